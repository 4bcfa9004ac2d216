//! Choosing a fit, held against the full computation.

mod common;
mod random_joints;

use std::collections::BTreeSet;
use std::path::Path;

use hubgrip::findings::{Findings, FindingsError, Verdict, VerdictUnit, compute};
use hubgrip::joint::{Fit, Joint, read};
use hubgrip::material::library::Library;
use hubgrip::population::choose::{
    Basis, Choice, ChooseError, ChosenFit, Options, Parameter, Standard, Subject, WORKSHOP, choose,
};
use hubgrip::tolerance::ansi_b4_1;
use hubgrip::tolerance::iso286::{Grade, ToleranceClass, defined_classes};
use hubgrip::tolerance::{FitCallout, FitLimits, Limits, Member};
use rand::{Rng, RngExt};

const ISO: Options = Options { standard: Standard::Iso286, finest: None };

const HUB: &str = "\
joint_file: 1
diameter: 60 mm
length: 70 mm
shaft: {material: C45+N, roughness: Rz 6.3 um}
hub: {material: C45+N, outer_diameter: 120 mm, roughness: Rz 10 um}
friction: 0.12
duty:
  - {state: rated, torque: 200 N.m}
require: {slip_safety: 1.5, yield_safety: 1.2}
";

fn joint(text: &str) -> Joint {
    read::read_without_fit(text.as_bytes(), Path::new("test.yaml"), &[], &Library::built_in()).unwrap()
}

fn full(joint: &Joint, callout: &str, limits: FitLimits) -> Result<Findings, FindingsError> {
    let fit = Fit { callout: callout.to_owned(), limits, source: "test".to_owned() };
    compute(Joint { fits: vec![fit], ..joint.clone() })
}

/// What a fit gives is what the check finds, requirement for requirement. A joint without load, a press without limit and a
/// time that nobody asked for are verdicts without a requirement.
fn found_as_the_check_finds(choice: &Choice, fit: &ChosenFit) {
    found_as(choice, fit, &full(&choice.joint, &fit.callout, fit.limits).unwrap());
}

fn found_as(choice: &Choice, fit: &ChosenFit, findings: &Findings) {
    let asked = findings
        .verdicts
        .iter()
        .filter(|verdict| verdict.required.is_some() || verdict.unit == VerdictUnit::Temperature);
    let mut verdicts: Vec<&Verdict> = asked.collect();
    verdicts.sort_by_key(|verdict| verdict.unit == VerdictUnit::Time);
    assert_eq!(verdicts.len(), fit.found.len(), "{verdicts:?} {:?}", choice.requirements);
    for ((wanted, (found, ok)), verdict) in choice.requirements.iter().zip(&fit.found).zip(verdicts) {
        assert_eq!(*ok, verdict.ok, "{}: {wanted:?} {found:?} {verdict:?}", fit.callout);
        match (*found, verdict.found) {
            (Some(own), Some(full)) => {
                assert!((own - full).abs() < 1e-6 * full.abs().max(1e-3), "{wanted:?} {own} {verdict:?}");
            }
            (own, full) => assert_eq!(own, full, "{wanted:?} {verdict:?}"),
        }
    }
}

/// Whether the full check meets every requirement; a fit that it refuses is none that meets them.
fn passes(joint: &Joint, callout: &str, limits: FitLimits) -> bool {
    full(joint, callout, limits).is_ok_and(|findings| findings.verdicts.iter().all(|verdict| verdict.ok))
}

fn class(member: Member, random: &mut impl Rng, nominal: f64) -> ToleranceClass {
    let classes = defined_classes(member, nominal).unwrap();
    classes[random.random_range(0..classes.len())]
}

/// What is listed passes the full check, what is left out fails a requirement of it.
fn held_against_the_full_check(choice: &Choice, random: &mut impl Rng) -> (usize, usize) {
    let listed: BTreeSet<&str> = choice.fits.iter().map(|fit| fit.callout.as_str()).collect();
    assert_eq!(listed.len(), choice.fits.len(), "a fit is listed twice");
    let mut seen = (0, 0);
    let sample =
        (0..12).filter(|_| !choice.fits.is_empty()).map(|_| random.random_range(0..choice.fits.len()));
    for number in sample.chain([0, choice.fits.len().saturating_sub(1)]).collect::<Vec<_>>() {
        let Some(fit) = choice.fits.get(number) else { continue };
        let resolved = FitCallout::parse(&fit.callout).unwrap().resolve(choice.joint.diameter).unwrap();
        assert_eq!(resolved.limits, fit.limits);
        assert!(passes(&choice.joint, &fit.callout, fit.limits), "{} is listed", fit.callout);
        assert!(fit.meets_all() && fit.least_margin() > -1e-15);
        found_as_the_check_finds(choice, fit);
        seen.0 += 1;
    }
    for _ in 0..16 {
        let nominal = choice.joint.diameter;
        let (hole, shaft) = (class(Member::Hole, random, nominal), class(Member::Shaft, random, nominal));
        let callout = format!("{hole}/{shaft}");
        let limits =
            FitLimits { nominal, hole: hole.limits(nominal).unwrap(), shaft: shaft.limits(nominal).unwrap() };
        let met = passes(&choice.joint, &callout, limits);
        assert_eq!(met, listed.contains(callout.as_str()), "{callout}");
        seen.1 += usize::from(!met);
    }
    seen
}

/// The window is exact: a fit without tolerance at its edges passes, one beyond them fails.
fn edges_are_exact(choice: &Choice) {
    let at = |interference: f64| {
        let limits = FitLimits {
            nominal: choice.joint.diameter,
            hole: Limits { lower: 0.0, upper: 0.0 },
            shaft: Limits { lower: interference, upper: interference },
        };
        passes(&choice.joint, "edge", limits)
    };
    let Some(greatest) = choice.window.greatest.filter(|greatest| *greatest > choice.window.least) else {
        return;
    };
    assert!(choice.window.least.is_finite());
    assert!(at(choice.window.least + 1e-11), "least {}", choice.window.least);
    assert!(!at(choice.window.least - 1e-11), "least {}", choice.window.least);
    if greatest.is_finite() {
        assert!(at(greatest - 1e-11), "greatest {greatest}");
        assert!(!at(greatest + 1e-11), "greatest {greatest}");
    }
}

/// A subject without the number of its state.
fn kind(subject: Subject) -> String {
    let text = format!("{subject:?}");
    text.split('(').next().unwrap().to_owned()
}

#[test]
fn random_joints_are_chosen_for_as_the_full_check_would() {
    let library = Library::built_in();
    let mut random = random_joints::stream(11);
    let (mut listed, mut left_out, mut with_fits) = (0, 0, 0);
    let mut judged = BTreeSet::new();
    for _ in 0..24 {
        let mut parts = random_joints::parts(&mut random);
        parts.fit = None;
        let read = read::read_without_fit(parts.text().as_bytes(), Path::new("random.yaml"), &[], &library);
        let Ok(joint) = read else { continue };
        let choice = choose(joint, ISO).unwrap();
        let seen = held_against_the_full_check(&choice, &mut random);
        edges_are_exact(&choice);
        listed += seen.0;
        left_out += seen.1;
        with_fits += usize::from(!choice.fits.is_empty());
        let relaxed = choice.joint.duty.iter().any(|state| state.relaxation < 1.0);
        judged.extend(relaxed.then(|| "relaxation".to_owned()));
        judged.extend(choice.requirements.iter().map(|wanted| kind(wanted.subject)));
    }
    assert_eq!(judged.len(), 9, "{judged:?}");
    assert!(listed > 60 && left_out > 150 && with_fits > 5, "{listed} {left_out} {with_fits}");
}

/// The time from oven or bath to seated is followed fit by fit; what is listed has it, what meets all else and is not
/// listed has not. The time required is that of one of the fits, so that one at least is a near thing.
#[test]
fn the_handling_time_is_judged_as_the_full_check_does() {
    let (mut listed, mut short) = (0, 0);
    let options = Options { finest: Grade::numbered(7), ..ISO };
    for (plan, outer) in [
        ("method: heat hub, shop_temperature: 15 degC", "120 mm"),
        ("method: heat hub, oven_temperature: 220 degC, transfer_time: 20 s", "124 mm"),
        ("method: chill shaft, bath: liquid nitrogen, clearance: 20 um, form_error: 5 um", "120 mm"),
        ("method: heat and chill, bath: dry ice, handling_allowance: 10 um", "118 mm"),
    ] {
        let text = HUB.replace("120 mm", outer) + &format!("assembly: {{{plan}}}\n");
        let joint = joint(&text);
        let all = choose(joint.clone(), options).unwrap();
        assert!((3..12).contains(&all.fits.len()), "{plan}: {}", all.fits.len());
        // A transfer asks for its time too.
        let edges = all.requirements.iter().all(|wanted| wanted.subject.has_edges());
        assert_eq!(edges, !plan.contains("transfer_time"));
        let required = time(&joint, &all.fits[all.fits.len() / 2]).unwrap();
        let mut timed = joint.clone();
        timed.assembly.practice.handling_time = Some(required);
        let choice = choose(timed, options).unwrap();
        assert_eq!(choice.window, all.window);
        assert_eq!(choice.requirements.last().unwrap().subject, Subject::HandlingTime);
        for fit in &all.fits {
            let findings = full(&choice.joint, &fit.callout, fit.limits).unwrap();
            let found = choice.fits.iter().find(|found| found.callout == fit.callout);
            let met = findings.verdicts.iter().all(|verdict| verdict.ok);
            assert_eq!(met, found.is_some(), "{} of {required}", fit.callout);
            short += usize::from(!met);
            if let Some(found) = found {
                found_as(&choice, found, &findings);
                listed += 1;
            }
        }
        assert_eq!(choice.short_of_time, all.fits.len() - choice.fits.len());
    }
    assert!(listed >= 5 && short >= 3, "{listed} listed, {short} short of time");
}

/// Time from oven or bath to seated of a fit.
fn time(joint: &Joint, fit: &ChosenFit) -> Option<f64> {
    let findings = full(joint, &fit.callout, fit.limits).unwrap();
    findings.verdicts.iter().find(|verdict| verdict.unit == VerdictUnit::Time)?.found
}

/// Where the time alone leaves nothing, it is said so, the longest is told, and no change is made up.
#[test]
fn a_time_that_no_fit_leaves_is_told() {
    let hot = HUB.to_owned() + "assembly: {method: heat hub, handling_time: 2 h}\n";
    let choice = choose(joint(&hot), Options { finest: Grade::numbered(7), ..ISO }).unwrap();
    assert!(choice.fits.is_empty() && choice.short_of_time > 0 && choice.changes.is_empty());
    let nearest = choice.nearest.clone().unwrap();
    let missed: Vec<Subject> = choice
        .requirements
        .iter()
        .zip(&nearest.found)
        .filter(|(_, (_, ok))| !ok)
        .map(|(wanted, _)| wanted.subject)
        .collect();
    assert_eq!(missed, [Subject::HandlingTime]);
    assert_eq!(nearest.found.last().unwrap().0, time(&choice.joint, &nearest));
    let (code, text, errors) = chosen(&hot, &["--finest", "7"]);
    assert_eq!((code, errors.as_str()), (1, ""));
    let joined = text.split_whitespace().collect::<Vec<_>>().join(" ");
    for said in ["meet everything but one: time from oven to seated", "has no smallest change"] {
        assert!(joined.contains(said), "no `{said}` in {text}");
    }
    // What a change lets in meets the time as well, though the search goes by the rest.
    let heavy = hot.replace("200 N.m", "4 kN.m").replace("2 h", "5 s");
    let choice = choose(joint(&heavy), Options { finest: Grade::numbered(7), ..ISO }).unwrap();
    assert!(choice.fits.is_empty() && choice.short_of_time == 0 && !choice.changes.is_empty());
    for change in &choice.changes {
        let changed = change.parameter.changed(&choice.joint, change.smallest.to).unwrap();
        let lets_in = FitCallout::parse(&change.smallest.lets_in).unwrap();
        let limits = lets_in.resolve(changed.diameter).unwrap().limits;
        assert!(passes(&changed, &change.smallest.lets_in, limits), "{change:?}");
    }
}

/// Bending alone wants grip: a joint without torque is chosen for by its edges.
#[test]
fn a_joint_that_only_bends_is_chosen_for() {
    let bent = HUB.replace("torque: 200 N.m", "bending_moment: 150 N.m, radial_force: 2 kN");
    let choice = choose(joint(&bent), ISO).unwrap();
    assert_eq!(choice.binding().0.unwrap().subject, Subject::GapingEdge(0));
    assert!(!choice.fits.is_empty());
    held_against_the_full_check(&choice, &mut random_joints::stream(7));
    edges_are_exact(&choice);
}

/// An aluminium shaft in a warm shop closes pairs that are made with clearance, and a hot state closes more: `check` judges
/// them, and so they are listed where they meet everything.
#[test]
fn fits_that_warmth_closes_are_listed_as_the_check_judges_them() {
    let warm = HUB
        .replace("shaft: {material: C45+N", "shaft: {material: EN-AW-6082-T6, section: 40 mm")
        .replace("torque: 200 N.m", "torque: 60 N.m, temperature: 100 degC")
        + "assembly: {method: heat hub, shop_temperature: 30 degC}\nsmoothing: none\n";
    let options = Options { finest: Grade::numbered(6), ..ISO };
    let choice = choose(joint(&warm), options).unwrap();
    let listed: BTreeSet<&str> = choice.fits.iter().map(|fit| fit.callout.as_str()).collect();
    let nominal = choice.joint.diameter;
    let mut closed = 0;
    for hole in defined_classes(Member::Hole, nominal).unwrap() {
        for shaft in defined_classes(Member::Shaft, nominal).unwrap() {
            let six = Grade::numbered(6).unwrap();
            if hole.grade != six || shaft.grade != six {
                continue;
            }
            let callout = format!("{hole}/{shaft}");
            let (hole, shaft) = (hole.limits(nominal).unwrap(), shaft.limits(nominal).unwrap());
            let limits = FitLimits { nominal, hole, shaft };
            let made = limits.interference();
            if choice.window.holds(made.loosest, made.tightest) {
                let found = full(&choice.joint, &callout, limits).unwrap();
                let met = found.verdicts.iter().all(|verdict| verdict.ok);
                closed += usize::from(met && made.loosest < 0.0);
                assert_eq!(met, listed.contains(callout.as_str()), "{callout}");
            }
        }
    }
    assert!(closed > 3, "{closed} closed by warmth alone");
}

/// The seat of a bearing ring: each class of the other member, written as `fit: k6` in the joint file and checked.
#[test]
fn the_seat_of_a_bearing_ring_is_chosen_as_the_check_judges_it() {
    let library = Library::built_in();
    let on_shaft = "joint_file: 1\n\
        shaft: {material: C45+QT, roughness: Rz 2.5 um}\n\
        hub: {bearing: {bore: 50 mm, outside_diameter: 90 mm, width: 20 mm, clearance: C3}}\n\
        smoothing: none\n\
        duty: [{state: running, radial_force: 4 kN, shaft_temperature: 60 degC, hub_temperature: 50 degC}]\n\
        assembly: {method: heat hub, clearance: 25 um}\n";
    let in_housing = "joint_file: 1\n\
        shaft: {bearing: {bore: 60 mm, outside_diameter: 110 mm, width: 22 mm, type: roller, class: 6}}\n\
        hub: {material: EN-GJL-250, outer_diameter: 150 mm, roughness: Rz 4 um, section: 20 mm}\n\
        duty: [{state: running, torque: 30 N.m, temperature: 60 degC}]\n\
        require: {press_force: 12 kN}\n";
    for (text, made) in [(on_shaft, Member::Shaft), (in_housing, Member::Hole)] {
        let joint = joint(text);
        let choice = choose(joint.clone(), ISO).unwrap();
        let classes = defined_classes(made, joint.diameter).unwrap();
        assert_eq!(choice.considered, classes.len());
        let listed: BTreeSet<&str> = choice.fits.iter().map(|fit| fit.callout.as_str()).collect();
        assert!(listed.len() > 5 && listed.len() < classes.len() / 2, "{} listed", listed.len());
        for class in classes {
            let callout = class.to_string();
            let written = format!("{text}fit: {callout}\n");
            let findings =
                compute(read::read(&written, Path::new("seat.yaml"), &[], &library).unwrap()).unwrap();
            let met = findings.verdicts.iter().all(|verdict| verdict.ok);
            assert_eq!(met, listed.contains(callout.as_str()), "{callout}");
            let Some(fit) = choice.fits.iter().find(|fit| fit.callout == callout) else { continue };
            assert_eq!(fit.limits, findings.joint.fits[0].limits);
            found_as_the_check_finds(&choice, fit);
            let (seat, bearing) = (fit.seat.as_ref().unwrap(), findings.bearing.as_ref().unwrap());
            let left = bearing.states.iter().map(|state| state.left.low).fold(bearing.mounted.low, f64::min);
            assert_eq!(seat.least_clearance, left);
            assert_eq!(seat.hoop_stress, bearing.hoop_stress.tightest);
        }
        let costs: Vec<f64> = choice.fits.iter().map(|fit| fit.relative_cost.unwrap()).collect();
        assert!(costs.windows(2).all(|pair| pair[0] <= pair[1]));
        // What the bearing settles is not changed to let a class in.
        let heavy = text.replace("4 kN", "90 kN").replace("30 N.m", "2 kN.m");
        let told = choose(self::joint(&heavy), ISO).unwrap();
        let settled =
            if made == Member::Shaft { Parameter::HubOuterDiameter } else { Parameter::ShaftStrength };
        assert!(told.fits.is_empty());
        assert!(
            told.changes
                .iter()
                .all(|change| change.parameter != settled && change.parameter != Parameter::Length)
        );
        let by_inch = Options { standard: Standard::AnsiB4_1, finest: None };
        assert_eq!(choose(joint, by_inch), Err(ChooseError::RingByIso));
    }
}

#[test]
fn every_pair_of_a_small_set_is_judged_as_the_full_check_does() {
    let joint = joint(HUB);
    let options = Options { finest: Grade::numbered(7), ..ISO };
    let choice = choose(joint.clone(), options).unwrap();
    let listed: BTreeSet<&str> = choice.fits.iter().map(|fit| fit.callout.as_str()).collect();
    let nominal = joint.diameter;
    let among = |member, grades: [u8; 2]| -> Vec<ToleranceClass> {
        let wanted = grades.map(|grade| Grade::numbered(grade).unwrap());
        let classes = defined_classes(member, nominal).unwrap();
        classes.into_iter().filter(|class| wanted.contains(&class.grade)).collect()
    };
    let mut agreed = 0;
    for hole in among(Member::Hole, [7, 8]) {
        for shaft in among(Member::Shaft, [7, 8]) {
            let callout = format!("{hole}/{shaft}");
            let limits = FitLimits {
                nominal,
                hole: hole.limits(nominal).unwrap(),
                shaft: shaft.limits(nominal).unwrap(),
            };
            let interference = limits.interference();
            if interference.loosest < choice.window.least - 30e-6 || interference.tightest > 200e-6 {
                assert!(!listed.contains(callout.as_str()));
                continue;
            }
            let met = passes(&joint, &callout, limits);
            assert_eq!(met, listed.contains(callout.as_str()), "{callout}");
            agreed += usize::from(met);
        }
    }
    assert!(agreed > 3, "only {agreed} fits of grades 7 and 8 pass");
    assert!(choice.fits.iter().all(|fit| fit.finest_grade >= Grade::numbered(7)));
}

#[test]
fn the_cheapest_come_first_and_preferred_ones_before_their_equals() {
    let choice = choose(joint(HUB), ISO).unwrap();
    let costs: Vec<f64> = choice.fits.iter().map(|fit| fit.relative_cost.unwrap()).collect();
    assert!(costs.windows(2).all(|pair| pair[0] <= pair[1]));
    for pair in choice.fits.windows(2) {
        if pair[0].relative_cost == pair[1].relative_cost {
            assert!(pair[0].preferred_by.is_empty() <= pair[1].preferred_by.is_empty());
        }
    }
    let fit = choice.fits.iter().find(|fit| fit.callout == "H7/s6").unwrap();
    // H7 and a shaft of grade 6 are the unit of the relative cost; both standards prefer H7/s6.
    assert!((fit.relative_cost.unwrap() - 1.0).abs() < 1e-12);
    assert_eq!(fit.preferred_by, ["ISO 286-1", "ANSI B4.2"]);
    assert_eq!(fit.basis, Some(Basis::Hole));
    // ISO 286-1, H7/s6 over 50 to 65 mm: 23 to 72 µm.
    assert_eq!((fit.loosest, fit.tightest), (23e-6, 72e-6));
    for (basis, callout) in [(Basis::Shaft, "S7/h6"), (Basis::Mixed, "S7/k6")] {
        let found = choice.fits.iter().find(|fit| fit.basis == Some(basis));
        assert!(found.is_some(), "no fit such as {callout}");
    }
}

/// Window of the joint above by hand: T_cap = μ p π d² L/2 ≥ 1.5 T, and at the bore of the hub
/// p √(3 + Q⁴)/(1 − Q²) ≤ Re/1.2 (von Mises), both turned into interference by Lamé's
/// U = p d (C_h/E_h + C_s/E_s); Rz 6.3 and 10 µm lose 0.8 of their sum (DIN 7190:2001).
#[test]
fn the_window_is_that_of_the_hand_calculation() {
    let joint = joint(HUB);
    let choice = choose(joint.clone(), ISO).unwrap();
    let (shaft, hub) = (&joint.rings[0], &joint.rings[1]);
    let q2 = 0.25f64;
    let hub_factor = (1.0 + q2) / (1.0 - q2);
    let flexibility = (hub_factor + hub.material.poisson.value) / hub.material.youngs_modulus.value
        + (1.0 - shaft.material.poisson.value) / shaft.material.youngs_modulus.value;
    let needed = 1.5 * 200.0 * 2.0 / (0.12 * std::f64::consts::PI * 0.06f64.powi(2) * 0.07);
    let least = needed * 0.06 * flexibility + 0.8 * 16.3e-6;
    let allowed = hub.strength.yield_strength.unwrap() / 1.2 * (1.0 - q2) / (3.0 + q2 * q2).sqrt();
    let greatest = allowed * 0.06 * flexibility;
    assert!((choice.window.least - least).abs() < 1e-15, "{} {least}", choice.window.least);
    assert!((choice.window.greatest.unwrap() - greatest).abs() < 1e-15);
    let (below, above) = choice.binding();
    assert_eq!(below.unwrap().subject, Subject::Slip(0));
    assert_eq!(above.unwrap().subject, Subject::HubStrength);
}

/// A liner under pressure from inside wants grip: its strength sets the least interference, the hub's the greatest.
#[test]
fn a_part_that_the_grip_relieves_wants_a_least_interference() {
    let vessel = "\
joint_file: 1
diameter: 60 mm
length: 70 mm
shaft: {material: C45+N, bore: 40 mm, section: 10 mm}
hub: {material: 42CrMo4+QT, outer_diameter: 110 mm}
friction: 0.12
smoothing: none
duty: [{state: pressed up, torque: 1 N.m, inner_pressure: 170 MPa}]
require: {slip_safety: 1.5, yield_safety: 1.2}
";
    let choice = choose(joint(vessel), ISO).unwrap();
    let liner = choice.requirements.iter().find(|wanted| wanted.subject == Subject::ShaftStrength).unwrap();
    assert!(liner.least.is_some_and(|least| least > 0.0), "{liner:?}");
    assert_eq!(choice.binding().0.unwrap().subject, Subject::ShaftStrength);
    edges_are_exact(&choice);
    assert!(!choice.fits.is_empty());
    held_against_the_full_check(&choice, &mut random_joints::stream(5));
    // Beyond what any grip makes good, no fit is left, and the text says so.
    let burst = choose(joint(&vessel.replace("170 MPa", "900 MPa")), ISO).unwrap();
    assert!(burst.requirements.iter().any(|wanted| wanted.never_met) && burst.fits.is_empty());
}

#[test]
fn limits_of_press_and_oven_close_the_window() {
    let free = choose(joint(HUB), ISO).unwrap();
    let pressed =
        choose(joint(&HUB.replace("slip_safety: 1.5", "slip_safety: 1.5, press_force: 60 kN")), ISO).unwrap();
    assert!(pressed.window.greatest < free.window.greatest && pressed.fits.len() < free.fits.len());
    for fit in pressed.fits.iter().take(5) {
        assert!(
            full(&pressed.joint, &fit.callout, fit.limits).unwrap().assembly.press.tightest.peak_force
                <= 60e3
        );
    }
    let hot = HUB.replace("slip_safety: 1.5", "slip_safety: 1.5, hub_temperature: 180 degC")
        + "assembly: {method: heat hub}\n";
    let heated = choose(joint(&hot), ISO).unwrap();
    // Δε = (U + c)/d: the strain of the hub at 180 °C leaves 0.06 ε − 60 µm for the interference.
    let strain = heated.joint.rings[1].material.expansion.strain(453.15).unwrap();
    let greatest = 0.06 * strain - 60e-6;
    assert!((heated.window.greatest.unwrap() - greatest).abs() < 1e-13, "{greatest}");
    let remark = |joint: &Joint| joint.remarks.iter().any(|remark| remark.contains("is not judged"));
    assert!(!remark(&heated.joint));
    assert!(remark(&joint(&HUB.replace("slip_safety: 1.5", "slip_safety: 1.5, hub_temperature: 180 degC"))));
}

/// When nothing fits, each change that is told lets a fit in, and most of it does not.
#[test]
fn the_smallest_change_lets_a_fit_in() {
    let library = Library::built_in();
    let mut random = random_joints::stream(23);
    let (mut closed, mut told) = (0, 0);
    for _ in 0..60 {
        let mut parts = random_joints::parts(&mut random);
        parts.fit = None;
        let file = Path::new("random.yaml");
        let Ok(joint) = read::read_without_fit(parts.text().as_bytes(), file, &[], &library) else {
            continue;
        };
        let choice = choose(joint.clone(), ISO).unwrap();
        if !choice.fits.is_empty() {
            assert!(choice.changes.is_empty() && choice.nearest.is_none());
            continue;
        }
        closed += 1;
        let nearest = choice.nearest.as_ref().unwrap();
        assert!(!nearest.meets_all() && nearest.least_margin() < 0.0);
        for change in &choice.changes {
            told += 1;
            let to = &change.smallest;
            let fits = match change.parameter.key() {
                Some(key) if key != "friction.holding" => {
                    let set = [(key.to_owned(), to.written.clone())];
                    let changed =
                        read::read_without_fit(parts.text().as_bytes(), file, &set, &library).unwrap();
                    choose(changed, ISO).unwrap().fits
                }
                _ => choose(change.parameter.changed(&joint, to.to).unwrap(), ISO).unwrap().fits,
            };
            assert_eq!(fits[0].callout, to.lets_in, "{change:?}");
            let most = change.from + 0.97 * (to.to - change.from);
            let less = change.parameter.changed(&joint, most).unwrap();
            assert!(choose(less, ISO).unwrap().fits.is_empty(), "{change:?}");
            if let Some(workshop) = &change.for_workshop {
                let changed = change.parameter.changed(&joint, workshop.to).unwrap();
                let options = Options { finest: Grade::numbered(WORKSHOP), ..ISO };
                assert_eq!(choose(changed, options).unwrap().fits[0].callout, workshop.lets_in);
                assert!((workshop.to / change.from).ln().abs() >= (to.to / change.from).ln().abs());
            }
        }
        if closed == 6 {
            break;
        }
    }
    assert!(closed >= 4 && told >= 6, "{closed} closed, {told} changes");
}

#[test]
fn a_longer_hub_is_told_when_the_torque_is_too_much() {
    let heavy = joint(&HUB.replace("200 N.m", "4000 N.m"));
    let choice = choose(heavy.clone(), ISO).unwrap();
    assert!(choice.fits.is_empty());
    assert!(choice.window.least > choice.window.greatest.unwrap());
    let parameters: Vec<Parameter> = choice.changes.iter().map(|change| change.parameter).collect();
    assert!(parameters.contains(&Parameter::Length), "{parameters:?}");
    assert!(parameters.contains(&Parameter::HubStrength), "{parameters:?}");
    let (_, above) = choice.binding();
    let found = choice.found_at(above.unwrap(), choice.window.least).unwrap().unwrap();
    assert!(found < 1.2);
}

#[test]
fn the_fit_of_the_file_is_judged_as_well() {
    let met = choose(joint(&(HUB.to_owned() + "fit: H7/s6\n")), ISO).unwrap();
    assert!(met.given.as_ref().unwrap().meets_all());
    let missed = choose(joint(&(HUB.to_owned() + "fit: H7/p6\n")), ISO).unwrap();
    let given = missed.given.unwrap();
    assert!(!given.meets_all() && given.margin_below < 0.0);
    let own = "fit: {hole: {lower: 0 um, upper: 30 um}, shaft: {lower: 53 um, upper: 72 um}}\n";
    let given = choose(joint(&(HUB.to_owned() + own)), ISO).unwrap().given.unwrap();
    assert_eq!((given.basis, given.relative_cost.map(|cost| (cost * 1e6).round())), (None, Some(1e6)));
}

#[test]
fn inch_fits_come_from_ansi_b4_1() {
    let inch = HUB.replace("60 mm", "2.5 in").replace("120 mm", "5 in").replace("70 mm", "3 in");
    let joint = joint(&inch);
    let choice = choose(joint.clone(), Options { standard: Standard::AnsiB4_1, finest: None }).unwrap();
    assert_eq!(choice.considered, 28);
    assert!(!choice.fits.is_empty());
    let listed: Vec<&str> = choice.fits.iter().map(|fit| fit.callout.as_str()).collect();
    for class in ansi_b4_1::defined_classes(joint.diameter).unwrap() {
        let callout = class.to_string();
        let met = passes(&joint, &callout, class.limits(joint.diameter).unwrap());
        assert_eq!(met, listed.contains(&callout.as_str()), "{callout}");
    }
}

#[test]
fn without_a_load_there_is_nothing_to_choose_by() {
    let idle = joint(&HUB.replace("torque: 200 N.m", "torque: 0 N.m"));
    assert_eq!(choose(idle, ISO), Err(ChooseError::NoLoad));
    let large = HUB.replace("60 mm", "4 m").replace("outer_diameter: 120 mm", "outer_diameter: 6 m");
    let large = joint(&large.replace("C45+N", "C45+N, section: 20 mm"));
    assert!(matches!(choose(large, ISO), Err(ChooseError::Tolerance(_))));
}

fn chosen(text: &str, more: &[&str]) -> (i32, String, String) {
    let folder = tempfile::tempdir().unwrap();
    std::fs::write(folder.path().join("joint.yaml"), text).unwrap();
    let output = common::hubgrip_in(folder.path(), &[&["choose", "joint.yaml"], more].concat());
    (output.status.code().unwrap(), common::stdout(&output), common::stderr(&output))
}

#[test]
fn the_command_lists_the_fits_within_80_columns() {
    let (code, text, errors) = chosen(HUB, &[]);
    assert_eq!((code, errors.as_str()), (0, ""));
    assert!(text.contains("H7/s6 *"), "{text}");
    assert!(text.lines().all(|line| line.chars().count() <= 80), "{text}");
    let (_, all, _) = chosen(HUB, &["--all"]);
    assert!(all.lines().count() > 500 && all.lines().all(|line| line.chars().count() <= 80));
    let (code, text, _) = chosen(HUB, &["--finest", "IT6"]);
    assert!(code == 0 && !text.contains("/s5"), "{text}");
}

#[test]
fn the_command_says_what_stands_in_the_way() {
    let (code, text, errors) = chosen(HUB, &["--set", "duty.0.torque=4kN.m"]);
    assert_eq!((code, errors.as_str()), (1, ""));
    for said in
        ["None of", "are lacking even without any tolerance", "Nearest is", "length of the hub (length)"]
    {
        let joined = text.split_whitespace().collect::<Vec<_>>().join(" ");
        assert!(joined.contains(said), "no `{said}` in {text}");
    }
    assert!(text.lines().all(|line| line.chars().count() <= 80), "{text}");
    let (code, text, _) = chosen(HUB, &["--standard", "ansi"]);
    assert!(code < 2 && text.contains("of 28 fits"), "{text}");
}

#[test]
fn bad_input_is_told_with_a_way_out() {
    let (code, _, errors) = chosen(&HUB.replace("torque: 200 N.m", "torque: 0 N.m"), &[]);
    assert!(code == 2 && errors.contains("give a load"), "{errors}");
    let (code, _, errors) = chosen(HUB, &["--finest", "-1"]);
    assert!(code == 2 && errors.contains("grades are"), "{errors}");
    let (code, _, errors) = chosen(HUB, &["-o", "joint.yaml"]);
    assert!(code == 2 && errors.contains("would be overwritten"), "{errors}");
    let (code, _, errors) = chosen(HUB, &["--finest", "19"]);
    assert!(code == 2 && errors.contains("grades are"), "{errors}");
    let (code, _, errors) = chosen(HUB, &["--standard", "ansi", "--finest", "6"]);
    assert!(code == 2 && errors.contains("--standard iso"), "{errors}");
    let (code, _, errors) = chosen(&HUB.replace("60 mm", "60"), &["--json"]);
    let error: serde_json::Value = serde_json::from_str(&errors).unwrap();
    assert!(code == 2 && error["error"]["line"] == 2, "{errors}");
}

/// Where a joint cannot be chosen for, the key is shown, and what to do instead.
#[test]
fn a_joint_that_cannot_be_chosen_for_is_refused_at_its_key() {
    let example = |name: &str| {
        std::fs::read_to_string(Path::new(env!("CARGO_MANIFEST_DIR")).join("examples").join(name)).unwrap()
    };
    for (name, place, words) in [
        ("three-ring-vessel.yaml", "joint.yaml:6:1: ", "fits.0="),
        ("stepped-coupling.yaml", "joint.yaml:18:3: ", "one section"),
        ("plastic-hub.yaml", "joint.yaml:13:11: ", "leave it out"),
        ("transition-locating.yaml", "joint.yaml: ", "give a load"),
    ] {
        let (code, printed, errors) = chosen(&example(name), &[]);
        assert_eq!((code, printed.as_str()), (2, ""), "{name}: {errors}");
        assert!(errors.starts_with(place), "{name}: no {place} in {errors}");
        assert!(errors.contains(words), "{name}: {errors}");
    }
    let (code, _, errors) = chosen(HUB, &["--set", "require.allow=plastic"]);
    assert!(code == 2 && errors.contains("--set require.allow: "), "{errors}");
    let (code, _, errors) = chosen(&example("choose/bearing-seat.yaml"), &["--standard", "ansi"]);
    assert!(code == 2 && errors.contains("joint.yaml:7:7: ") && errors.contains("ISO 492"), "{errors}");
    let (code, _, errors) = chosen(&example("bearing-on-shaft.yaml"), &[]);
    assert!(code == 2 && errors.contains("radial_force"), "{errors}");
}

#[test]
fn json_holds_every_fit_and_no_number_that_is_none() {
    let (code, text, _) = chosen(HUB, &["--json"]);
    let found: serde_json::Value = serde_json::from_str(&text).unwrap();
    assert_eq!(code, 0);
    let fits = found["fits"].as_array().unwrap();
    assert_eq!(fits.len(), choose(joint(HUB), ISO).unwrap().fits.len());
    let fit = fits.iter().find(|fit| fit["fit"] == "H7/s6").unwrap();
    assert_eq!((fit["loosest_um"].as_f64(), fit["tightest_um"].as_f64()), (Some(23.0), Some(72.0)));
    assert_eq!(fit["preferred_by"][0], "ISO 286-1");
    assert!(found["window"]["least_um"].as_f64() < Some(23.0));
    let (code, text, _) = chosen(HUB, &["--json", "--set", "duty.0.torque=4kN.m"]);
    let found: serde_json::Value = serde_json::from_str(&text).unwrap();
    assert_eq!(code, 1);
    assert!(found["fits"].as_array().unwrap().is_empty() && found["nearest"]["ok"] == false);
    assert!(found["changes"][0]["smallest"]["lets_in"].is_string());
}

#[test]
fn the_page_needs_nothing_else_and_escapes_what_it_shows() {
    let folder = tempfile::tempdir().unwrap();
    std::fs::write(folder.path().join("joint.yaml"), HUB.to_owned() + "title: <script>alert(1)</script>\n")
        .unwrap();
    let arguments = ["choose", "joint.yaml", "-o", "choice.html", "--quiet"];
    let output = common::hubgrip_in(folder.path(), &arguments);
    assert_eq!((output.status.code(), output.stdout.len()), (Some(0), 0));
    let page = std::fs::read_to_string(folder.path().join("choice.html")).unwrap();
    assert!(page.starts_with("<!DOCTYPE html>") && page.contains("plot-windows"));
    assert!(!page.contains("<script") && !page.contains("NaN") && !page.contains("http-equiv"));
    assert_eq!(page.matches("<svg").count(), 1);
    common::hubgrip_in(folder.path(), &["choose", "joint.yaml", "-o", "again.html", "--quiet"]);
    assert_eq!(page, std::fs::read_to_string(folder.path().join("again.html")).unwrap());
}

#[test]
fn the_examples_find_fits() {
    for name in ["hub-without-fit.yaml", "bearing-seat.yaml"] {
        let example = Path::new(env!("CARGO_MANIFEST_DIR")).join("examples/choose").join(name);
        let example = std::fs::read_to_string(example).unwrap();
        let (code, text, errors) = chosen(&example, &[]);
        assert_eq!((code, errors.as_str()), (0, ""), "{text}");
        assert!(text.lines().all(|line| line.chars().count() <= 80), "{text}");
        // With every column there is, at the widest.
        let set = ["assembly.handling_time=1 s", "duty.0.torque=20 N.m", "display=inch"];
        let more: Vec<&str> = set.iter().flat_map(|set| ["--set", *set]).collect();
        let (code, wide, _) =
            chosen(&example, &[&["--finest", "5", "--standard", "iso"], more.as_slice()].concat());
        assert!(code == 0 && wide.lines().all(|line| line.chars().count() <= 80), "{wide}");
        let (_, json, _) = chosen(&example, &["--json"]);
        let found: serde_json::Value = serde_json::from_str(&json).unwrap();
        let fit = &found["fits"][0];
        assert_eq!(fit["bearing"]["least_clearance_um"].is_number(), name == "bearing-seat.yaml");
        assert!(fit.get("handling_time_s").is_none() && found["short_of_time"] == 0);
    }
}
