//! The kernel against the full computation, over random joints.

mod random_joints;

use hubgrip::findings::{Findings, Question, RingStress, Verdict, VerdictUnit, compute};
use hubgrip::joint::{Bath, Joint, Method};
use hubgrip::material::library::Library;
use hubgrip::population::kernel::joining::PlainJoining;
use hubgrip::population::kernel::{KernelError, PairKind, Part, Place, PlainJoint, RingValues};

/// Rounding of a few dozen operations on doubles; nothing that subtracts nearly equal numbers is compared.
const ROUNDING: f64 = 1e-12;

#[track_caller]
fn same(kernel: f64, full: f64, scale: f64) {
    let allowed = ROUNDING * kernel.abs().max(full.abs()).max(scale);
    assert!((kernel - full).abs() <= allowed, "kernel {kernel}, full computation {full}");
}

#[track_caller]
fn same_option(kernel: Option<f64>, full: Option<f64>) {
    match (kernel, full) {
        (Some(kernel), Some(full)) => same(kernel, full, 0.0),
        (kernel, full) => assert_eq!(kernel, full),
    }
}

fn same_ring(kernel: &RingValues, full: &RingStress, pressure: f64) {
    for (kernel, full) in [(kernel.bore, full.bore), (kernel.rim, full.rim)] {
        same(kernel.radial, full.radial, pressure);
        same(kernel.hoop, full.hoop, pressure);
        same(kernel.von_mises, full.von_mises, pressure);
        same(kernel.tresca, full.tresca, pressure);
    }
    same(kernel.equivalent, full.equivalent, pressure);
    same_option(kernel.safety, full.safety);
}

fn same_findings(plain: &PlainJoint, findings: &Findings) {
    let kinds = [PairKind::Loosest, PairKind::Mean, PairKind::Tightest];
    for (kind, (_, full)) in kinds.into_iter().zip(findings.extremes.as_ref().named()) {
        let pair = plain.pair(full.interference, kind).unwrap();
        same(pair.smoothing, full.smoothing, 1e-6);
        same(pair.effective_interference, full.effective_interference, 1e-6);
        // The pressure is a small difference of interference and expansion when temperatures differ.
        same(pair.pressure, full.pressure, 1e6);
        same(pair.torque_capacity, full.torque_capacity, 1.0);
        same(pair.axial_capacity, full.axial_capacity, 10.0);
        same(pair.press_force.low, full.press_force.low, 10.0);
        same(pair.press_force.high, full.press_force.high, 10.0);
        same(pair.release_force.low, full.release_force.low, 10.0);
        same(pair.release_force.high, full.release_force.high, 10.0);
        same_ring(&pair.shaft, &full.rings[0], 1e6);
        same_ring(&pair.hub, &full.rings[1], 1e6);
    }
    for (number, duty) in findings.duty.iter().enumerate() {
        let pairs = [
            (&duty.loosest, &findings.extremes.loosest, PairKind::Loosest),
            (&duty.tightest, &findings.extremes.tightest, PairKind::Tightest),
        ];
        for (full, pair, kind) in pairs {
            let condition = &plain.states[number];
            let fresh = plain.state(condition, plain.effective(pair.interference, kind));
            let state = if kind == PairKind::Loosest { fresh.relaxed(condition.relaxation) } else { fresh };
            same(state.pressure, full.pressure, 1e6);
            same(state.torque_capacity, full.torque_capacity, 1.0);
            same(state.axial_capacity, full.axial_capacity, 10.0);
            match (state.slip_safety, full.slip_safety) {
                (Some(kernel), Some(full)) => same(kernel, full, 0.01),
                (kernel, full) => assert_eq!(kernel, full),
            }
            same_ring(&state.shaft, &full.rings[0], 1e6);
            same_ring(&state.hub, &full.rings[1], 1e6);
        }
    }
}

fn same_joining(joint: &Joint, findings: &Findings) {
    let joining = PlainJoining::of(joint).unwrap();
    let made = findings.extremes.tightest.interference;
    let assembly = &findings.assembly;
    same_option(joining.hub_limit(), assembly.hub_limit.as_ref().map(|limit| limit.0));
    same_option(joining.heat_hub(made), assembly.heat_hub.temperature);
    assert_eq!(joining.allowed(joining.heat_hub(made)), assembly.heat_hub.possible);
    same_option(joining.chill_shaft(made), assembly.chill_shaft.temperature);
    for bath in &assembly.baths {
        let besides = joining.hub_besides(bath.bath, made).filter(|found| joining.allowed(Some(*found)));
        same_option(besides, bath.hub_temperature);
        assert_eq!(joining.bath_alone(bath.bath, made), bath.alone);
    }
    if let Some((found, ok)) = joining.by_method(joint.assembly.method, joint.assembly.bath, made) {
        let joined =
            |verdict: &&Verdict| verdict.question == Question::Assembly && verdict.unit != VerdictUnit::Time;
        let verdict = findings.verdicts.iter().find(joined).unwrap();
        same_option(found, verdict.found);
        assert_eq!(ok, verdict.ok);
    }
}

/// The least safeties, the onset of yield and the edges, against the verdicts.
fn same_verdicts(plain: &PlainJoint, joint: &Joint, findings: &Findings) {
    let made = &findings.extremes;
    let loosest = plain.effective(made.loosest.interference, PairKind::Loosest);
    let tightest = plain.effective(made.tightest.interference, PairKind::Tightest);
    for (part, ring) in [(Part::Shaft, &joint.rings[0]), (Part::Hub, &joint.rings[1])] {
        let subject = format!("{} safety against", ring.name);
        let verdict = findings.verdicts.iter().find(|verdict| verdict.subject.starts_with(&subject)).unwrap();
        let least = plain.least_safety(part, loosest, tightest);
        same_option(least.map(|(safety, _)| safety), verdict.found);
    }
    let onset = findings.onset_of_yield.as_ref().map(|onset| (onset.pressure, onset.ring));
    let own = plain.onset().map(|(pressure, part)| (pressure, if part == Part::Shaft { 0 } else { 1 }));
    same_option(own.map(|own| own.0), onset.map(|onset| onset.0));
    assert_eq!(own.map(|own| own.1), onset.map(|onset| onset.1));
    for (condition, duty) in plain.states.iter().zip(&findings.duty) {
        let change = duty.tightest.bending.as_ref().map(|bending| bending.edge_change);
        same_option(condition.edge_change, change);
    }
}

#[test]
fn what_the_kernel_does_not_cover_is_refused() {
    let text = |more: &str| {
        format!(
            "joint_file: 1\ndiameter: 60 mm\nlength: 70 mm\nshaft: {{material: C45+N}}\nfit: H7/s6\n{more}\n"
        )
    };
    let read = |text: &str| {
        let file = std::path::Path::new("test.yaml");
        PlainJoint::of(&hubgrip::joint::read::read(text, file, &[], &Library::built_in()).unwrap())
    };
    let hub = "hub: {material: C45+N, outer_diameter: 120 mm}";
    assert!(read(&text(hub)).is_ok());
    assert_eq!(read(&text(&format!("{hub}\nrequire: {{allow: plastic}}"))), Err(KernelError::MayYield));
    let steps = "hub: {material: C45+N, steps: [{length: 30 mm, outer_diameter: 90 mm}, \
                 {length: 40 mm, outer_diameter: 120 mm}]}";
    assert_eq!(read(&text(steps)), Err(KernelError::Stepped));
}

#[test]
fn the_kernel_gives_what_the_full_computation_gives() {
    let library = Library::built_in();
    let mut random = random_joints::stream(1);
    let (mut compared, mut loose, mut hot, mut moved, mut closed_by_cold, mut relaxed) = (0, 0, 0, 0, 0, 0);
    for number in 0..400 {
        let mut parts = random_joints::parts(&mut random);
        // Every third shop is bitterly cold, every third cool: temperature alone then closes some pairs.
        let shop = ["shop_temperature: -20 degC", "shop_temperature: 5 degC"].get(number % 3);
        if let (Some(shop), Some(line)) =
            (shop, parts.lines.iter_mut().find(|line| line.contains("shop_temperature")))
        {
            for warm in ["20", "15", "25"] {
                *line = line.replace(&format!("shop_temperature: {warm} degC"), shop);
            }
        }
        let Some(joint) = parts.joint(&library) else { continue };
        let findings = compute(joint.clone()).unwrap_or_else(|error| panic!("{joint:#?}: {error}"));
        same_findings(&PlainJoint::of(&joint).unwrap(), &findings);
        same_verdicts(&PlainJoint::of(&joint).unwrap(), &joint, &findings);
        same_joining(&joint, &findings);
        let slip = findings.duty.iter();
        let least = slip.filter_map(|duty| duty.loosest.slip_safety).min_by(f64::total_cmp);
        let plain = PlainJoint::of(&joint).unwrap();
        let loosest = plain.effective(findings.extremes.loosest.interference, PairKind::Loosest);
        match (plain.least_slip_safety(loosest), least) {
            (Some((kernel, _)), Some(full)) => same(kernel, full, 0.01),
            (kernel, full) => assert_eq!(kernel.is_some(), full.is_some()),
        }
        compared += 1;
        relaxed += usize::from(joint.duty.iter().any(|state| state.relaxation < 1.0));
        moved += usize::from(joint.duty.iter().any(|state| state.speed > 0.0 || state.inner_pressure > 0.0));
        loose += usize::from(findings.extremes.loosest.pressure == 0.0);
        let loosest = &findings.extremes.loosest;
        closed_by_cold += usize::from(loosest.effective_interference <= 0.0 && loosest.pressure > 0.0);
        hot += usize::from(joint.assembly.method != Method::Press);
    }
    assert!(compared > 300, "only {compared} joints could be read");
    assert!(closed_by_cold > 10, "only {closed_by_cold} joints are closed by the shop temperature");
    assert!(
        loose > 10 && hot > 50 && moved > 50 && relaxed > 50,
        "{loose} loose, {hot} hot, {moved} moved and {relaxed} relaxed joints are too few"
    );
}

/// What random joints do not reach: temperatures at which Young's modulus has lost up to a quarter, in a warm shop, with a
/// gradient, turning, under pressure.
#[test]
fn the_kernel_follows_the_moduli_of_hot_and_cold_states() {
    let library = Library::built_in();
    let mut lost: f64 = 1.0;
    for (shaft, hub, hot) in [
        ("42CrMo4+QT", "EN-AW-6082-T6", 230),
        ("X5CrNi18-10", "C45+N", 350),
        ("Ti-6Al-4V", "Ti-6Al-4V", 300),
        ("C45+N", "EN-GJL-250", 250),
    ] {
        let text = format!(
            "joint_file: 1\ndiameter: 60 mm\nlength: 60 mm\nshaft: {{material: {shaft}, bore: 20 mm, section: 30 mm}}\n\
             hub: {{material: {hub}, outer_diameter: 120 mm, section: 20 mm}}\n\
             fit: {{hole: H7, shaft: {{lower: 400 um, upper: 420 um}}}}\nassembly: {{shop_temperature: 35 degC}}\nduty:\n  \
             - {{state: hot, torque: 10 N.m, temperature: {hot} degC}}\n  - {{state: uneven, torque: 10 N.m, shaft_temperature: \
             100 degC, hub_temperature: {hot} degC, speed: 3000 rpm}}\n  - {{state: gradient, axial_force: 1 kN, inner_temperature: \
             {hot} degC, outer_temperature: 60 degC, inner_pressure: 30 MPa}}\n  - {{state: frost, torque: 10 N.m, temperature: -60 \
             degC, outer_pressure: 10 MPa}}\n"
        );
        let joint = hubgrip::joint::read::read(&text, std::path::Path::new("hot.yaml"), &[], &library);
        let joint = joint.unwrap_or_else(|faults| panic!("{text}\n{faults:?}"));
        let findings = compute(joint.clone()).unwrap();
        let plain = PlainJoint::of(&joint).unwrap();
        same_findings(&plain, &findings);
        same_verdicts(&plain, &joint, &findings);
        for (condition, duty) in plain.states.iter().zip(&findings.duty) {
            same(condition.shaft_modulus, duty.youngs_moduli[0], 0.0);
            same(condition.hub_modulus, duty.youngs_moduli[1], 0.0);
            lost = lost.min(condition.hub_modulus / joint.rings[1].material.youngs_modulus.value);
        }
    }
    assert!(lost < 0.85, "{lost}");
}

#[test]
fn arrays_give_what_single_pairs_give() {
    let library = Library::built_in();
    let mut random = random_joints::stream(2);
    for _ in 0..20 {
        let Some(joint) = random_joints::parts(&mut random).joint(&library) else { continue };
        let plain = PlainJoint::of(&joint).unwrap();
        let made: Vec<f64> = (0..1000).map(|k| f64::from(k - 300) * 0.3e-6).collect();
        let mut effective = vec![0.0; made.len()];
        plain.smoothed(&made, &mut effective);
        let mut pressures = vec![0.0; made.len()];
        for condition in plain.states.iter().chain([&plain.shop]) {
            plain.pressures(condition, &effective, &mut pressures);
            for ((made, effective), pressure) in made.iter().zip(&effective).zip(&pressures) {
                let smoothed = hubgrip::findings::after_smoothing(*made, plain.smoothing_loss);
                assert_eq!(smoothed, *effective);
                assert_eq!(plain.pressure(condition, smoothed), *pressure);
            }
        }
    }
}

/// Two steel rings of d 50 mm in D 100 mm, solid shaft, E 200 GPa, ν 0.3 and U 50 µm press at 75 MPa, and the
/// bore of the hub carries σφ 125 MPa and σv 175 MPa (Lamé, by hand: Q = 1/2, C_h = 5/3 + 0.3, C_s = 1 − 0.3).
#[test]
fn a_joint_computed_by_hand() {
    let material = "{name: steel, kind: ductile, youngs_modulus: 200 GPa, poisson: 0.3, density: 7800 kg/m3, \
                    expansion: 12e-6 /K, yield_strength: 350 MPa, tensile_strength: 600 MPa, source: invented}";
    let text = format!(
        "joint_file: 1\ndiameter: 50 mm\nlength: 40 mm\nshaft: {{material: {material}}}\n\
         hub: {{material: {material}, outer_diameter: 100 mm}}\nfit: H7/s6\n\
         friction: {{holding: 0.12, pressing: 0.1, release: 0.12}}\nsmoothing: none\n\
         duty: [{{state: rated, torque: 500 N.m, axial_force: 5 kN}}]\n"
    );
    let joint =
        hubgrip::joint::read::read(&text, std::path::Path::new("hand.yaml"), &[], &Library::built_in())
            .unwrap();
    let plain = PlainJoint::of(&joint).unwrap();
    let pair = plain.pair(50e-6, PairKind::Tightest).unwrap();
    same(pair.pressure, 75e6, 0.0);
    same(pair.hub.bore.hoop, 125e6, 0.0);
    same(pair.hub.equivalent, 175e6, 0.0);
    same(pair.hub.safety.unwrap(), 2.0, 0.0);
    same(pair.shaft.equivalent, 75e6, 0.0);
    // T = μ p π d² L/2, F = μ p π d L and 1/S = √((T/T_cap)² + (F/F_cap)²): 1413.71669 N·m, 56548.6678 N, 2.7430133.
    assert!((pair.torque_capacity - 1_413.716_69).abs() < 1e-5);
    assert!((pair.axial_capacity - 56_548.667_8).abs() < 1e-4);
    let (safety, state) = plain.least_slip_safety(50e-6).unwrap();
    assert!((safety - 2.743_013_30).abs() < 1e-8 && state == 0);
    let place = Place { state: None, pair: PairKind::Tightest };
    assert_eq!(plain.least_safety(Part::Hub, 50e-6, 50e-6), Some((pair.hub.safety.unwrap(), place)));
    assert_eq!(plain.onset().unwrap().1, Part::Hub);
    assert_eq!(PlainJoining::of(&joint).unwrap().by_method(Method::Press, Bath::DryIce, 50e-6), None);
}
