//! The joint file: what is read, what is refused, with which words and at which place.

use std::path::Path;

use hubgrip::diagnostic::Diagnostic;
use hubgrip::joint::read::{LARGEST, read, read_bytes};
use hubgrip::joint::{Bath, Joint, Method, SmoothingAt};
use hubgrip::material::Kind;
use hubgrip::material::library::Library;
use hubgrip::mechanics::criteria::DuctileCriterion;
use hubgrip::quantity::UnitSystem;
use proptest::prelude::*;

/// A file with every key. Invented demo data.
const FULL: &str = "\
joint_file: 1
title: Demo hub
drawing: D-12.50 rev 007
note: two lines are not needed
date: 2026-01-31
diameter: 60 mm
length: 70 mm
relief: 3 mm
shaft: {name: pin, material: C45+N, bore: 20 mm, roughness: Rz 6.3 um, section: 20 mm}
hub:
  name: web
  material: EN-GJL-250
  outer_diameter: 110 mm
  roughness: Ra 1.6 um
  section: 25 mm
fit: H7/s6
friction: {holding: 0.12, pressing: 0.08 to 0.14, release: 0.1 to 0.2, lubrication: oiled}
duty:
  - {state: rated, torque: 900 N.m, axial_force: 2 kN, shaft_temperature: 60 degC, hub_temperature: 45 degC}
  - state: idle
    temperature: 313.15 K
assembly:
  method: heat and chill
  shop_temperature: 25 degC
  clearance: 50 um
  chamfer_angle: 10 deg
  bath: liquid nitrogen
  hub_temperature_limit: 200 degC
smoothing: {factor: 0.4, at: both}
criterion: Tresca
require: {slip_safety: 1.4, yield_safety: 1.1, fracture_safety: 2.2, press_force: 300 kN}
display: inch
";

/// The least file that is read. Invented demo data.
const LEAST: &str = "\
joint_file: 1
diameter: 60 mm
length: 70 mm
shaft: {material: C45+N}
hub: {material: C45+QT, outer_diameter: 110 mm}
fit: H7/u6
";

fn joint(text: &str) -> Joint {
    match read(text, Path::new("demo.yaml"), &[], &Library::built_in()) {
        Ok(joint) => joint,
        Err(faults) => panic!("{}", listed(&faults)),
    }
}

fn faults(text: &str) -> Vec<Diagnostic> {
    read(text, Path::new("demo.yaml"), &[], &Library::built_in()).expect_err("the text is read")
}

fn set(text: &str, changes: &[(&str, &str)]) -> Result<Joint, Vec<Diagnostic>> {
    let changes: Vec<(String, String)> =
        changes.iter().map(|(key, value)| ((*key).to_owned(), (*value).to_owned())).collect();
    read(text, Path::new("demo.yaml"), &changes, &Library::built_in())
}

fn listed(faults: &[Diagnostic]) -> String {
    faults.iter().map(|fault| format!("{fault} [{}]\n", fault.help.as_deref().unwrap_or("-"))).collect()
}

/// Line, column and width.
fn place(fault: &Diagnostic) -> Option<(usize, usize, usize)> {
    fault.place.map(|place| (place.line, place.column, fault.width))
}

/// One fault: the change that makes it, its place, its message, a part of its help.
struct Case {
    change: (&'static str, &'static str),
    place: Option<(usize, usize, usize)>,
    message: &'static str,
    help: &'static str,
}

fn check(text: &str, cases: &[Case]) {
    for case in cases {
        let (from, to) = case.change;
        assert!(text.contains(from), "the text has no `{from}`");
        let found = faults(&text.replacen(from, to, 1));
        assert_eq!(found.len(), 1, "`{to}`:\n{}", listed(&found));
        let fault = &found[0];
        assert_eq!(fault.message, case.message, "`{to}`");
        assert_eq!(place(fault), case.place, "`{to}`: {}", listed(&found));
        let help = fault.help.as_deref().unwrap_or("");
        assert!(help.contains(case.help), "`{to}`: help is `{help}`");
        assert_eq!(case.help.is_empty(), help.is_empty(), "`{to}`: help is `{help}`");
        assert_eq!(fault.file.as_deref(), Some(Path::new("demo.yaml")), "`{to}`");
    }
}

fn case(
    change: (&'static str, &'static str),
    place: (usize, usize, usize),
    message: &'static str,
    help: &'static str,
) -> Case {
    Case { change, place: Some(place), message, help }
}

fn missing(change: &'static str, message: &'static str, help: &'static str) -> Case {
    Case { change: (change, ""), place: None, message, help }
}

#[test]
fn every_key_reaches_the_joint() {
    let joint = joint(FULL);
    assert_eq!(joint.title, "Demo hub");
    assert_eq!(joint.drawing.as_deref(), Some("D-12.50 rev 007"));
    assert_eq!(joint.note.as_deref(), Some("two lines are not needed"));
    assert_eq!(joint.date.as_deref(), Some("2026-01-31"));
    assert_eq!((joint.diameter, joint.length, joint.relief), (0.060, 0.070, 0.003));
    let [shaft, hub] = &joint.rings[..] else { panic!("two rings") };
    assert_eq!((shaft.name.as_str(), hub.name.as_str()), ("pin", "web"));
    assert_eq!((shaft.inner_diameter, shaft.outer_diameter), (0.020, 0.060));
    assert_eq!((hub.inner_diameter, hub.outer_diameter), (0.060, 0.110));
    assert_eq!((shaft.section, hub.section), (0.020, 0.025));
    assert_eq!((shaft.roughness.value, hub.roughness.value), (6.3e-6, 6.0 * 1.6e-6));
    assert_eq!(hub.material.kind, Kind::Brittle);
    // ISO 286-2: 60 H7 +30/0, 60 s6 +72/+53.
    let limits = joint.fits[0].limits;
    assert_eq!((limits.hole.lower, limits.hole.upper), (0.0, 30e-6));
    assert_eq!((limits.shaft.lower, limits.shaft.upper), (53e-6, 72e-6));
    assert_eq!((joint.friction.holding.value.low, joint.friction.holding.value.high), (0.12, 0.12));
    assert_eq!((joint.friction.pressing.value.low, joint.friction.pressing.value.high), (0.08, 0.14));
    assert_eq!((joint.friction.release.value.low, joint.friction.release.value.high), (0.1, 0.2));
    assert_eq!(joint.duty[0].name, "rated");
    assert_eq!((joint.duty[0].torque, joint.duty[0].axial_force), (900.0, 2000.0));
    assert_eq!(joint.duty[0].temperatures, [333.15, 318.15]);
    assert_eq!(joint.duty[1].temperatures, [313.15, 313.15]);
    assert_eq!(joint.assembly.method, Method::HeatAndChill);
    assert_eq!(joint.assembly.bath, Bath::LiquidNitrogen);
    assert_eq!((joint.assembly.shop_temperature, joint.assembly.clearance.value), (298.15, 50e-6));
    assert!((joint.assembly.chamfer_angle.value.to_degrees() - 10.0).abs() < 1e-12);
    assert_eq!(joint.assembly.hub_temperature_limit, Some(473.15));
    assert_eq!((joint.smoothing.factor, joint.smoothing.at), (Some(0.4), SmoothingAt::Both));
    assert!((joint.smoothing.loss[0] - 0.4 * (6.3e-6 + 9.6e-6)).abs() < 1e-15);
    assert_eq!(joint.criterion, DuctileCriterion::Tresca);
    assert_eq!((joint.require.slip_safety, joint.require.yield_safety), (1.4, 1.1));
    assert_eq!((joint.require.fracture_safety, joint.require.press_force), (2.2, Some(300e3)));
    assert_eq!(joint.display, UnitSystem::Inch);
    let taken: Vec<&str> = joint.defaults.iter().map(|default| default.key.as_str()).collect();
    assert_eq!(taken, ["duty.idle.torque", "duty.idle.axial_force"]);
    assert!(joint.remarks.iter().any(|remark| remark.contains("Ra 1.6 um") && remark.contains("Rz 9.6 um")));
}

#[test]
fn every_silent_key_leaves_a_default_with_its_source() {
    let joint = joint(LEAST);
    let taken: Vec<(&str, &str)> =
        joint.defaults.iter().map(|default| (default.key.as_str(), default.value.as_str())).collect();
    assert_eq!(
        taken,
        [
            ("relief", "0 mm"),
            ("shaft.bore", "0 mm"),
            ("shaft.roughness", "Rz 6.3 um"),
            ("shaft.section", "60 mm"),
            ("hub.roughness", "Rz 10 um"),
            ("hub.section", "25 mm"),
            ("friction.lubrication", "oiled"),
            ("friction.holding", "0.06 to 0.13"),
            ("friction.pressing", "0.05 to 0.22"),
            ("friction.release", "0.07 to 0.2"),
            ("duty", "[{state: shop}]"),
            ("assembly.method", "press"),
            ("assembly.shop_temperature", "20 degC"),
            ("assembly.clearance", "60 um"),
            ("assembly.chamfer_angle", "5 deg"),
            ("assembly.bath", "dry ice"),
            ("smoothing.factor", "0.8"),
            ("smoothing.at", "loosest"),
            ("criterion", "von Mises"),
            ("require.slip_safety", "1.5"),
            ("require.yield_safety", "1.2"),
            ("require.fracture_safety", "2.5"),
            ("display", "metric"),
        ]
    );
    assert!(joint.defaults.iter().all(|default| !default.source.is_empty()));
    assert_eq!(joint.duty[0].temperatures, [293.15, 293.15]);
    assert_eq!(joint.assembly.clearance.value, 60e-6);
    assert_eq!(joint.smoothing.at, SmoothingAt::Loosest);
    assert!(joint.smoothing.rule.starts_with("DIN 7190:2001"), "{}", joint.smoothing.rule);
}

#[test]
fn a_default_written_into_the_file_changes_nothing() {
    let silent = joint(LEAST);
    let mut text = LEAST.to_owned();
    for (section, key) in [("shaft", "shaft"), ("hub", "hub")] {
        for default in &silent.defaults {
            if let Some((owner, name)) = default.key.split_once('.')
                && owner == key
            {
                text = text.replacen(
                    &format!("{section}: {{"),
                    &format!("{section}: {{{name}: {}, ", default.value),
                    1,
                );
            }
        }
    }
    for section in ["friction", "assembly", "smoothing", "require"] {
        text.push_str(&format!("{section}:\n"));
        for default in &silent.defaults {
            if let Some((owner, name)) = default.key.split_once('.')
                && owner == section
            {
                text.push_str(&format!("  {name}: {}\n", default.value));
            }
        }
    }
    for default in silent.defaults.iter().filter(|default| !default.key.contains('.')) {
        text.push_str(&format!("{}: {}\n", default.key, default.value));
    }
    let spoken = joint(&text);
    assert_eq!(spoken.friction.holding.value, silent.friction.holding.value);
    assert_eq!(spoken.friction.release.value, silent.friction.release.value);
    assert_eq!(spoken.assembly.clearance.value, silent.assembly.clearance.value);
    assert_eq!(spoken.assembly.chamfer_angle.value, silent.assembly.chamfer_angle.value);
    assert_eq!(spoken.smoothing.loss, silent.smoothing.loss);
    assert_eq!(spoken.rings[0].strength, silent.rings[0].strength);
    assert_eq!(spoken.rings[1].section, silent.rings[1].section);
    assert_eq!(spoken.duty, silent.duty);
    assert_eq!(spoken.require, silent.require);
    let keys: Vec<&str> = spoken.defaults.iter().map(|default| default.key.as_str()).collect();
    assert_eq!(
        keys,
        [
            "duty.shop.torque",
            "duty.shop.axial_force",
            "duty.shop.shaft_temperature",
            "duty.shop.hub_temperature"
        ]
    );
}

#[test]
fn quantities_are_refused_at_their_place() {
    check(
        FULL,
        &[
            case(("diameter: 60 mm", "diameter: 60"), (6, 11, 2), "60 has no unit: write 60 mm", "a length"),
            case(
                ("diameter: 60 mm", "diameter: 60 MPa"),
                (6, 11, 6),
                "60 MPa is a pressure; a length is due (mm, um, in, thou, m, cm, nm, uin, ft)",
                "mm",
            ),
            case(
                ("diameter: 60 mm", "diameter: .nan"),
                (6, 11, 4),
                ".nan is not a finite number; a length is due",
                "unit",
            ),
            case(
                ("diameter: 60 mm", "diameter: 1e999 mm"),
                (6, 11, 8),
                "1e999 mm is not a finite number; a length is due",
                "unit",
            ),
            case(
                ("diameter: 60 mm", "diameter: '60 mmm'"),
                (6, 11, 8),
                "mmm is not a unit that is known; a length is due (mm, um, in, thou, m, cm, nm, uin, ft)",
                "did you mean mm?",
            ),
            case(("diameter: 60 mm", "diameter: ''"), (6, 11, 2), "`diameter` is an empty text", ""),
            case(("length: 70 mm", "length: -70 mm"), (7, 9, 6), "length -70 mm must be more than zero", ""),
            case(("relief: 3 mm", "relief: -3 mm"), (8, 9, 5), "relief -3 mm must not be negative", ""),
            case(
                ("relief: 3 mm", "relief: 70 mm"),
                (8, 9, 5),
                "relief 70 mm leaves nothing of the length 70 mm",
                "",
            ),
            case(
                ("torque: 900 N.m", "torque: -900 N.m"),
                (19, 28, 8),
                "torque -900 N.m is negative: give its size, the joint holds alike in both directions",
                "",
            ),
            case(
                ("temperature: 313.15 K", "temperature: -300 degC"),
                (21, 18, 9),
                "-300 degC is below absolute zero (-273.15 degC)",
                "degC",
            ),
            case(
                ("slip_safety: 1.4", "slip_safety: 0"),
                (31, 24, 1),
                "slip_safety 0 must be more than zero",
                "",
            ),
            case(
                ("slip_safety: 1.4", "slip_safety: high"),
                (31, 24, 4),
                "high is not a plain number: it does not begin with a number",
                "number",
            ),
            case(
                ("press_force: 300 kN", "press_force: -1 kN"),
                (31, 83, 5),
                "press_force -1 kN must be more than zero",
                "",
            ),
        ],
    );
}

#[test]
fn diameters_that_do_not_fit_each_other_are_refused() {
    check(
        FULL,
        &[
            case(
                ("bore: 20 mm", "bore: 60 mm"),
                (9, 43, 5),
                "bore 60 mm is not smaller than the mating diameter 60 mm",
                "",
            ),
            case(("bore: 20 mm", "bore: -1 mm"), (9, 43, 5), "bore -1 mm must not be negative", ""),
            case(
                ("outer_diameter: 110 mm", "outer_diameter: 50 mm"),
                (13, 19, 5),
                "outer_diameter 50 mm is not larger than the mating diameter 60 mm",
                "",
            ),
            case(
                ("  section: 25 mm", "  section: 0 mm"),
                (15, 12, 4),
                "section 0 mm must be more than zero",
                "",
            ),
            case(
                ("section: 20 mm", "section: 900 mm"),
                (9, 81, 6),
                "C45+N has no strength for a ruling section of 900 mm: its table ends at 250 mm",
                "write the material here",
            ),
        ],
    );
    // The hub's wall of 300 mm is beyond the last row of the steel; nothing else names a section.
    check(
        LEAST,
        &[case(
            ("outer_diameter: 110 mm", "outer_diameter: 660 mm"),
            (5, 17, 6),
            "C45+QT has no strength for a ruling section of 300 mm: its table ends at 100 mm",
            "`section`",
        )],
    );
}

#[test]
fn keys_are_refused_with_what_was_meant() {
    check(
        FULL,
        &[
            case(
                ("outer_diameter", "outer_diametr"),
                (13, 3, 13),
                "unknown key `outer_diametr` in `hub`",
                "did you mean `outer_diameter`?",
            ),
            case(("title:", "titel:"), (2, 1, 5), "unknown key `titel`", "did you mean `title`?"),
            case(
                ("state: idle", "state: idle\n    torqe: 3 N.m"),
                (21, 5, 5),
                "unknown key `torqe` in `duty.1`",
                "did you mean `torque`?",
            ),
            case(
                ("display: inch", "bath: dry ice"),
                (32, 1, 4),
                "unknown key `bath`",
                "`bath` is a key of `assembly`: indent it below its section",
            ),
            case(
                ("note: two", "zzz: two"),
                (4, 1, 3),
                "unknown key `zzz`",
                "the keys here are joint_file, title,",
            ),
            case(
                ("  name: web", "  name: web\n  name: rim"),
                (12, 3, 4),
                "`name` stands twice in this section",
                "keep one",
            ),
            case(
                ("criterion: Tresca", "criterion:"),
                (30, 1, 9),
                "`criterion` has no value",
                "after the colon",
            ),
            case(
                ("criterion: Tresca", "criterion: ~"),
                (30, 1, 9),
                "`criterion` has no value",
                "after the colon",
            ),
        ],
    );
}

#[test]
fn words_are_refused_with_what_was_meant() {
    check(
        FULL,
        &[
            case(
                ("method: heat and chill", "method: heat the hub"),
                (23, 11, 12),
                "`heat the hub` is not a method of assembly",
                "did you mean `heat hub`?",
            ),
            case(
                ("bath: liquid nitrogen", "bath: ice"),
                (27, 9, 3),
                "`ice` is not a cold bath",
                "dry ice, liquid nitrogen",
            ),
            case(
                ("criterion: Tresca", "criterion: von Misses"),
                (30, 12, 10),
                "`von Misses` is not a strength criterion for ductile parts",
                "did you mean `von Mises`?",
            ),
            case(
                ("display: inch", "display: imperial"),
                (32, 10, 8),
                "`imperial` is not a unit system",
                "metric, inch",
            ),
            case(
                ("lubrication: oiled", "lubrication: oild"),
                (17, 85, 4),
                "`oild` is not a state of the seats",
                "did you mean `oiled`?",
            ),
            case(
                ("{factor: 0.4, at: both}", "DIN 7190-1:2071"),
                (29, 12, 15),
                "no rule for smoothing is called `DIN 7190-1:2071`",
                "did you mean `DIN 7190-1:2017`?",
            ),
            case(("at: both", "at: tightest"), (29, 30, 8), "`tightest` is not a choice of pairs", "loosest"),
            case(
                ("material: EN-GJL-250", "material: EN-GLJ-250"),
                (12, 13, 10),
                "no material is called `EN-GLJ-250`",
                "`EN-GJL-250`",
            ),
            case(
                ("material: EN-GJL-250", "material: 1.0503"),
                (12, 13, 6),
                "`1.0503` may be C45+N or C45+QT",
                "write `C45+N` or `C45+QT`",
            ),
            case(
                ("roughness: Rz 6.3 um", "roughness: 6.3 um"),
                (9, 61, 6),
                "`6.3 um` does not say which roughness it is",
                "write `Rz 6.3 um` or `Ra 6.3 um`",
            ),
        ],
    );
}

#[test]
fn shapes_are_refused_with_the_shape_that_is_due() {
    check(
        FULL,
        &[
            case(
                ("diameter: 60 mm", "diameter: [60 mm]"),
                (6, 11, 7),
                "`diameter` is one value, not a list",
                "",
            ),
            case(
                ("title: Demo hub", "title: {a: b}"),
                (2, 8, 6),
                "`title` is one value, not a section with keys of its own",
                "",
            ),
            case(
                (
                    "require: {slip_safety: 1.4, yield_safety: 1.1, fracture_safety: 2.2, press_force: 300 kN}",
                    "require: 1.5",
                ),
                (31, 10, 3),
                "`require` is a section with keys of its own, not `1.5`",
                "",
            ),
            case(
                ("fit: H7/s6", "fit: [H7, s6]"),
                (16, 6, 8),
                "`fit` is a section with keys of its own, not a list",
                "",
            ),
        ],
    );
    let text = LEAST.to_owned() + "duty: {torque: 3 N.m}\n";
    let found = faults(&text);
    assert_eq!(
        found[0].message,
        "`duty` is a list, each item after `- `, not a section with keys of its own"
    );
    assert_eq!(place(&found[0]), Some((7, 7, 15)));
}

#[test]
fn missing_keys_are_named_with_an_example() {
    check(
        LEAST,
        &[
            missing("joint_file: 1\n", "`joint_file` is missing", "`joint_file: 1`"),
            missing("diameter: 60 mm\n", "`diameter` is missing", "`diameter: 60 mm`"),
            missing("length: 70 mm\n", "`length` is missing", "`length: 70 mm`"),
            missing("fit: H7/u6\n", "`fit` is missing", "`fit: H7/s6`"),
            missing("shaft: {material: C45+N}\n", "`shaft` is missing", "`shaft: {material: C45+N}`"),
            case(
                ("material: C45+QT, ", ""),
                (5, 1, 3),
                "`material` is missing in `hub`",
                "`material: EN-GJL-250`",
            ),
            case(
                (", outer_diameter: 110 mm", ""),
                (5, 1, 3),
                "`outer_diameter` is missing in `hub`",
                "`outer_diameter: 110 mm`",
            ),
            case(("fit: H7/u6", "fit: {hole: H7}"), (6, 1, 3), "`shaft` is missing in `fit`", "`shaft: s6`"),
            case(
                ("fit: H7/u6", "fit: {hole: H7, shaft: {lower: 3 um}}"),
                (6, 17, 5),
                "`upper` is missing in `fit.shaft`",
                "`upper: 30 um`",
            ),
            case(
                ("fit: H7/u6", "fit: {measured: {hole: 60.01 mm, shaft: 60.06 mm}}"),
                (6, 7, 8),
                "`uncertainty` is missing in `fit.measured`",
                "`uncertainty: 2 um`",
            ),
        ],
    );
}

#[test]
fn what_is_not_calculated_yet_is_refused_by_name() {
    let with = |key: &'static str| ("  - state: idle\n", if key.is_empty() { "" } else { key });
    let message = |found: &[Diagnostic]| found[0].message.clone();
    for (key, line) in [
        (
            "speed: 1450 rpm",
            "`speed` is not supported yet: the loss of contact pressure in rotation is not calculated",
        ),
        (
            "bending_moment: 3 N.m",
            "`bending_moment` is not supported yet: bending of the joint is not calculated",
        ),
        (
            "rotating_bending: true",
            "`rotating_bending` is not supported yet: bending of the joint is not calculated",
        ),
        (
            "inner_temperature: 20 degC",
            "`inner_temperature` is not supported yet: a part is taken at one temperature throughout",
        ),
        (
            "outer_temperature: 20 degC",
            "`outer_temperature` is not supported yet: a part is taken at one temperature throughout",
        ),
    ] {
        let (from, _) = with("");
        let found = faults(&FULL.replacen(from, &format!("{from}    {key}\n"), 1));
        assert_eq!(found.len(), 1, "{}", listed(&found));
        assert_eq!(message(&found), line);
        let width = key.split(':').next().unwrap().len();
        assert_eq!(place(&found[0]), Some((21, 5, width)), "{key}");
        assert!(!found[0].help.as_deref().unwrap_or("").contains("did you mean"));
    }
    for key in ["rings: []", "fits: [H7/s6]", "order: [a, b]", "bearing: 6210", "allow: {plastic: true}"] {
        let name = key.split(':').next().unwrap();
        let found = faults(&format!("{LEAST}{key}\n"));
        assert_eq!(found.len(), 1, "{}", listed(&found));
        assert!(
            message(&found).starts_with(&format!("`{name}` is not supported yet: ")),
            "{}",
            message(&found)
        );
        assert_eq!(place(&found[0]), Some((7, 1, name.len())));
    }
    for (from, to, at) in [
        ("outer_diameter: 110 mm}", "outer_diameter: 110 mm, steps: []}", (5, 49, 5)),
        ("shaft: {material: C45+N}", "shaft: {material: C45+N, steps: []}", (4, 26, 5)),
        ("fit: H7/u6", "fit: {bearing: 6210, shaft: k6}", (6, 7, 7)),
    ] {
        let found = faults(&LEAST.replacen(from, to, 1));
        assert_eq!(found.len(), 1, "{}", listed(&found));
        assert!(message(&found).contains("is not supported yet"));
        assert_eq!(place(&found[0]), Some(at));
    }
}

#[test]
fn unsupported_keys_are_never_proposed() {
    for (key, not) in [("ring", "rings"), ("spped", "speed"), ("alow", "allow")] {
        let found = faults(&format!("{LEAST}{key}: 1\n"));
        let help = found[0].help.as_deref().unwrap_or("");
        assert!(!help.contains(&format!("`{not}`")), "{help}");
    }
}

#[test]
fn fits_in_every_form_are_read() {
    let limits = |fit: &str| {
        let limits = joint(&LEAST.replacen("fit: H7/u6", &format!("fit: {fit}"), 1)).fits[0].limits;
        [limits.hole.lower, limits.hole.upper, limits.shaft.lower, limits.shaft.upper]
            .map(|deviation| (deviation * 1e9).round() / 1e3)
    };
    // ISO 286-2: 60 H7 +30/0, 60 s6 +72/+53, 60 S7 −42/−72, 60 h6 0/−19.
    assert_eq!(limits("H7/s6"), [0.0, 30.0, 53.0, 72.0]);
    assert_eq!(limits("S7/h6"), [-72.0, -42.0, -19.0, 0.0]);
    assert_eq!(limits("{hole: H7, shaft: s6}"), [0.0, 30.0, 53.0, 72.0]);
    assert_eq!(limits("{hole: H7, shaft: {lower: 53 um, upper: 0.072 mm}}"), [0.0, 30.0, 53.0, 72.0]);
    assert_eq!(limits("{hole: {min: 60 mm, max: 60.03 mm}, shaft: s6}"), [0.0, 30.0, 53.0, 72.0]);
    assert_eq!(limits("{hole: ±10 um, shaft: +30 / -10 um}"), [-10.0, 10.0, -10.0, 30.0]);
    assert_eq!(
        limits("{measured: {hole: 60.012 mm, shaft: 60.061 mm, uncertainty: 2 um}}"),
        [10.0, 14.0, 59.0, 63.0]
    );
    assert_eq!(
        limits("{measured: {hole: 60.012 mm ± 2 um, shaft: 60.061 mm ± 2 um}}"),
        [10.0, 14.0, 59.0, 63.0]
    );
    // ANSI B4.1, FN 4 over 1.97 to 2.56 in: hole 0 to +1.2, shaft +3.5 to +4.2 thousandths of an inch.
    let thou = |value: f64| (value * 25.4 * 1e3).round() / 1e3;
    let text = LEAST.replacen("60 mm", "2 in", 1).replacen("H7/u6", "FN 4", 1);
    let found = joint(&text).fits[0].limits;
    assert_eq!((found.hole.upper * 1e9).round() / 1e3, thou(1.2));
    assert_eq!((found.shaft.upper * 1e9).round() / 1e3, thou(4.2));
    assert!(joint(&text).remarks.is_empty());
    assert!(joint(&LEAST.replacen("H7/u6", "FN 4", 1)).remarks[0].contains("2.362205 in"));
}

#[test]
fn fits_that_cannot_be_are_refused_at_the_member() {
    check(
        LEAST,
        &[
            case(
                ("fit: H7/u6", "fit: s6/H7"),
                (6, 6, 5),
                "`s6/H7` is not a fit: the hole stands first, then the shaft",
                "did you mean `H7/s6`?",
            ),
            case(
                ("fit: H7/u6", "fit: {hole: H7, shaft: {lower: 72 um, upper: 53 um}}"),
                (6, 24, 28),
                "the shaft's lower deviation +72 µm is above its upper deviation +53 µm",
                "lower deviation",
            ),
            case(
                ("fit: H7/u6", "fit: {hole: s6, shaft: h6}"),
                (6, 13, 2),
                "`s6` is a class for a shaft, a hole is due here",
                "did you mean `S6`?",
            ),
            case(
                ("fit: H7/u6", "fit: {hole: H7, shaft: {lower: 5 um, max: 60.1 mm}}"),
                (6, 24, 27),
                "deviations and sizes are mixed",
                "lower and upper",
            ),
            case(
                ("fit: H7/u6", "fit: {hole: H7, measured: {hole: 60 mm, shaft: 60.1 mm, uncertainty: 1 um}}"),
                (6, 7, 4),
                "`hole` stands beside `measured`",
                "either",
            ),
            case(
                ("fit: H7/u6", "fit: {measured: {hole: 60.01 mm, shaft: 60.06 mm, uncertainty: -1 um}}"),
                (6, 64, 5),
                "uncertainty -1 um must not be negative",
                "",
            ),
            case(
                ("fit: H7/u6", "fit: {measured: {hole: 6.01 mm, shaft: 60.06 mm, uncertainty: 1 um}}"),
                (6, 24, 7),
                "the hole's deviation -53991 µm is 90.0 % of the nominal diameter 60 mm, which looks like a slip of the unit",
                "unit",
            ),
        ],
    );
    // ISO 286-1: t is not used up to 24 mm, and no class goes beyond 3150 mm.
    let small = LEAST.replacen("diameter: 60 mm", "diameter: 20 mm", 1);
    let found = faults(&small.replacen("H7/u6", "H7/t6", 1));
    assert!(found[0].message.starts_with("t6 is not defined at 20 mm"), "{}", listed(&found));
    assert_eq!(place(&found[0]), Some((6, 6, 5)));
    let found = faults(&small.replacen("H7/u6", "{hole: H7, shaft: t6}", 1));
    assert_eq!(place(&found[0]), Some((6, 24, 2)));
    let large = LEAST.replacen("60 mm", "3200 mm", 1).replacen("110 mm", "3300 mm", 1);
    let large = large.replacen("C45+N", "C45+N, section: 50 mm", 1);
    let found = faults(&large);
    assert!(found[0].message.contains("3150 mm"), "{}", listed(&found));
}

#[test]
fn friction_is_checked() {
    check(
        FULL,
        &[
            case(
                ("holding: 0.12", "holding: 1.2"),
                (17, 21, 3),
                "holding 1.2 is not a coefficient of friction: it must be more than 0 and at most 1",
                "",
            ),
            case(
                ("holding: 0.12", "holding: 0"),
                (17, 21, 1),
                "holding 0 is not a coefficient of friction: it must be more than 0 and at most 1",
                "",
            ),
            case(
                ("pressing: 0.08 to 0.14", "pressing: 0.14 to 0.08"),
                (17, 37, 12),
                "the range 0.14 to 0.08 runs downwards",
                "0.08 to 0.14",
            ),
        ],
    );
    let odd = joint(&FULL.replacen("holding: 0.12", "holding: 0.5", 1));
    assert!(odd.remarks.iter().any(|remark| remark.contains("holding 0.5 is outside 0.02 to 0.4")));
    let one = joint(&format!("{LEAST}friction: 0.1 to 0.12\n"));
    assert_eq!((one.friction.release.value.low, one.friction.pressing.value.high), (0.1, 0.12));
    let dry = joint(&format!("{LEAST}friction: dry\n"));
    let same = joint(&format!("{LEAST}friction: {{lubrication: dry}}\n"));
    assert_eq!(dry.friction, same.friction);
    assert_ne!(dry.friction, joint(LEAST).friction);
    let found = faults(&format!("{LEAST}friction: wet\n"));
    assert_eq!(found[0].message, "`wet` is not a state of the seats");
}

#[test]
fn temperatures_stay_within_the_curves_of_the_parts() {
    let found = faults(&FULL.replacen("hub_temperature: 45 degC", "hub_temperature: 900 degC", 1));
    assert_eq!(found.len(), 1);
    assert!(
        found[0]
            .message
            .starts_with("hub_temperature 900 degC is outside the expansion curve of EN-GJL-250 (web)"),
        "{}",
        found[0].message
    );
    assert_eq!(place(&found[0]), Some((19, 101, 8)));
    check(
        FULL,
        &[
            case(
                ("hub_temperature_limit: 200 degC", "hub_temperature_limit: 10 degC"),
                (28, 26, 7),
                "hub_temperature_limit 10 degC is not above the shop temperature",
                "",
            ),
            case(
                ("temperature: 313.15 K", "temperature: 313.15 K\n    hub_temperature: 30 degC"),
                (22, 5, 15),
                "`hub_temperature` and `temperature` are both given",
                "all parts",
            ),
            case(
                ("chamfer_angle: 10 deg", "chamfer_angle: 90 deg"),
                (26, 18, 6),
                "chamfer_angle 90 deg must be more than 0 deg and less than 90 deg, counted from the axis",
                "",
            ),
        ],
    );
    let one = joint(&FULL.replacen(", hub_temperature: 45 degC", "", 1));
    assert_eq!(one.duty[0].temperatures, [333.15, 298.15]);
    assert!(
        one.defaults
            .iter()
            .any(|taken| taken.key == "duty.rated.hub_temperature" && taken.value == "25 degC")
    );
}

#[test]
fn states_have_names_of_their_own() {
    check(
        FULL,
        &[case(
            ("state: idle", "state: rated"),
            (20, 12, 5),
            "two states are called `rated`",
            "a name of its own",
        )],
    );
    let found = faults(&format!("{LEAST}duty: []\n"));
    assert_eq!(found[0].message, "`duty` lists no state");
    let unnamed = joint(&format!("{LEAST}duty:\n  - {{torque: 1 N.m}}\n"));
    assert_eq!(unnamed.duty[0].name, "state 1");
}

#[test]
fn materials_in_place_are_read_and_refused_at_their_place() {
    let steel = "{kind: ductile, youngs_modulus: 200 GPa, poisson: 0.30, density: 7850 kg/m3, \
                 expansion: 11.5e-6 /K, yield_strength: 355 MPa, tensile_strength: 600 MPa, source: demo figures}";
    let text = LEAST.replacen("C45+N", steel, 1);
    let shaft = &joint(&text).rings[0];
    assert_eq!(shaft.material.youngs_modulus.value, 200e9);
    assert_eq!(shaft.strength.yield_strength, Some(355e6));
    check(
        &text,
        &[
            case(
                ("youngs_modulus: 200 GPa", "youngs_modulus: 200"),
                (4, 51, 3),
                "200 has no unit: write 200 MPa",
                "a pressure",
            ),
            case(
                ("youngs_modulus: 200 GPa", "young_modulus: 200 GPa"),
                (4, 35, 13),
                "unknown key `young_modulus` in `shaft.material`",
                "did you mean `youngs_modulus`?",
            ),
            case(
                ("poisson: 0.30", "poisson: 0.6"),
                (4, 69, 3),
                "Poisson's ratio must lie between -1 and 0.5, not 0.6",
                "metals",
            ),
            case(
                ("kind: ductile", "kind: ductil"),
                (4, 26, 6),
                "unknown word `ductil`",
                "did you mean `ductile`?",
            ),
            case(("kind: ductile, ", ""), (4, 9, 8), "`kind` is missing in this section", ""),
        ],
    );
}

#[test]
fn material_numbers_keep_their_zeros() {
    // EN 10025-2: E335 is 1.0060, which YAML alone would read as the number 1.006.
    let joint = joint(&LEAST.replacen("C45+N", "1.0060", 1));
    assert_eq!(joint.rings[0].material.id, "E335");
}

#[test]
fn texts_that_look_like_numbers_stay_as_typed() {
    let joint = joint(&format!("{LEAST}title: 1e3\ndrawing: 12.50\nnote: 0x1F\ndate: 010\n"));
    assert_eq!(joint.title, "1e3");
    assert_eq!(joint.drawing.as_deref(), Some("12.50"));
    assert_eq!(joint.note.as_deref(), Some("0x1F"));
    assert_eq!(joint.date.as_deref(), Some("010"));
}

#[test]
fn text_that_is_not_yaml_is_told_in_plain_words() {
    for (text, at, message) in [
        ("joint_file: 1\nshaft:\n\tmaterial: C45\n", (3, 1, 1), "a tab indents this line"),
        (
            "joint_file: 1\nshaft: {material: C45+N\nfit: H7/s6\n",
            (2, 8, 1),
            "a brace or bracket is not closed",
        ),
        ("joint_file: 1\ntitle: \"Hub\nfit: H7/s6\n", (2, 8, 1), "a quote is not closed"),
        ("joint_file: 1\nshaft:\n  material: C45\n bore: 3 mm\n", (4, 2, 1), "a key is expected here"),
        ("joint_file: 1\ntitle: Hub: big\n", (2, 11, 1), "a second `: ` in one line"),
        (
            "joint_file: 1\n  title: Hub\n",
            (2, 8, 1),
            "a second `: ` in one line, or a line that is not indented",
        ),
        ("joint_file: 1\ndiameter:60 mm\nlength: 3 mm\n", (2, 1, 1), "a key without `: `"),
        ("joint_file: 1\ndiameter: !mm 60\n", (2, 11, 1), "a YAML tag"),
        ("joint_file: 1\n---\njoint_file: 1\n", (3, 1, 1), "a second document begins here"),
        ("joint_file: 1\n? [a, b]\n: 1\n", (2, 3, 1), "a key must be a plain word"),
        ("joint_file: 1\ntitle: @hub\n", (2, 8, 1), "a text does not begin with this sign"),
        ("title: a\u{7}b\n", (1, 9, 1), "a control character stands here"),
        ("title: a\u{2028}\nlength: @\n", (2, 9, 1), "a text does not begin with this sign"),
        ("title: *hub\n", (1, 8, 1), "an alias without its anchor"),
        ("- joint_file: 1\n", (1, 1, 15), "a joint file holds keys with values, this is a list"),
        ("diameter 60 mm", (1, 1, 14), "a joint file holds keys with values, this is one text"),
    ] {
        let found = faults(text);
        assert_eq!(found.len(), 1, "{text}");
        assert!(found[0].message.starts_with(message), "{text}: {}", found[0].message);
        assert_eq!(place(&found[0]), Some(at), "{text}");
        assert!(found[0].help.is_some(), "{text}");
    }
}

#[test]
fn what_is_not_a_joint_file_at_all_is_refused_at_once() {
    let library = Library::built_in();
    let message = |bytes: &[u8]| {
        let found = read_bytes(bytes, Path::new("demo.yaml"), &[], &library).unwrap_err();
        assert_eq!(found.len(), 1);
        (found[0].message.clone(), place(&found[0]))
    };
    for empty in ["", "\n\n", "# only a comment\n", "---\n", "\u{feff}"] {
        assert_eq!(message(empty.as_bytes()), ("the joint file is empty".to_owned(), None), "{empty:?}");
    }
    assert_eq!(message(b"\x7fELF\0\0"), ("this is not a text file: it holds NUL bytes".to_owned(), None));
    let latin = b"joint_file: 1\ntitle: Gr\xf6\xdfe\n";
    assert_eq!(message(latin), ("a character here is not UTF-8".to_owned(), Some((2, 10, 1))));
    let large = vec![b'#'; 10 << 20];
    assert_eq!(message(&large).0, "the file has 10.0 MiB, a joint file has at most 1 MiB");
    assert!(read_bytes(&vec![b'#'; LARGEST], Path::new("x"), &[], &library).is_err());
}

#[test]
fn hostile_yaml_is_refused_quickly() {
    let bomb: String = std::iter::once("a0: &a0 [x, x, x, x, x, x, x, x, x]\n".to_owned())
        .chain((1..10).map(|n| format!("a{n}: &a{n} [{}]\n", vec![format!("*a{}", n - 1); 9].join(", "))))
        .collect();
    let squared = format!("a: &a [{}]\nb: [{}]\n", vec!["x"; 1000].join(","), vec!["*a"; 100_000].join(","));
    let began = std::time::Instant::now();
    for (text, message) in [
        (bomb, "more than 100000 values"),
        (squared, "more than 100000 values"),
        ("a: &a [*a]\n".to_owned(), "nested too deeply"),
        (format!("a: {}", "[".repeat(1_000_000)), "nested too deeply"),
        ("- ".repeat(400_000), "nested too deeply"),
    ] {
        let found = faults(&text);
        assert_eq!(found[0].message, message);
    }
    let many: String = (0..20_000).map(|n| format!("k{n}: 1\n")).collect();
    let found = faults(&many);
    assert_eq!(found.len(), 21);
    assert!(found[20].message.ends_with("more faults are not shown"));
    assert!(began.elapsed().as_secs() < 30, "{:?}", began.elapsed());
}

#[test]
fn all_faults_are_told_in_the_order_of_the_file() {
    let text = "\
joint_file: 1
titel: Demo
diameter: 60
shaft: {material: C54+N, bore: 90 mm}
hub:
  outer_diametr: 50 mm
fit: H7/s66
duty:
  - {torque: 3 kg, speed: 10 rpm}
display: imperial
";
    let found = faults(text);
    let places: Vec<_> = found.iter().map(|fault| fault.place.map(|at| (at.line, at.column))).collect();
    assert_eq!(
        places,
        [
            Some((2, 1)),
            Some((3, 11)),
            Some((4, 19)),
            Some((5, 1)),
            Some((6, 3)),
            Some((7, 6)),
            Some((9, 14)),
            Some((9, 20)),
            Some((10, 10)),
            None,
        ],
        "{}",
        listed(&found)
    );
    assert_eq!(found[3].message, "`material` is missing in `hub`");
    assert_eq!(found[9].message, "`length` is missing");
    assert_eq!(found[1].to_string(), "demo.yaml:3:11: 60 has no unit: write 60 mm");
    assert_eq!(found[1].line_text.as_deref(), Some("diameter: 60"));
}

#[test]
fn a_file_of_another_version_gets_no_further() {
    let found = faults("joint_file: 2\ndiamter: 60\n");
    assert!(found.iter().any(|fault| fault.message == "written for joint_file 2, this hubgrip reads 1"));
    assert!(found.iter().all(|fault| !fault.message.contains("missing")), "{}", listed(&found));
    check(
        LEAST,
        &[case(
            ("joint_file: 1", "joint_file: one"),
            (1, 13, 3),
            "`one` is not a version of the joint file",
            "`joint_file: 1`",
        )],
    );
}

#[test]
fn a_byte_order_mark_and_windows_lines_do_not_matter() {
    let plain = joint(LEAST);
    let other = joint(&format!("\u{feff}{}", LEAST.replace('\n', "\r\n")));
    assert_eq!(other.rings, plain.rings);
    let found = faults(&format!("\u{feff}{}", LEAST.replace("length: 70 mm\n", "length: 70\r\n")));
    assert_eq!(place(&found[0]), Some((3, 9, 2)));
}

#[test]
fn aliases_are_read_and_faults_shown_where_they_are_used() {
    let text = "\
joint_file: 1
diameter: &d 60 mm
length: 70 mm
shaft: {material: &steel C45+N, bore: *d}
hub: {material: *steel, outer_diameter: 110 mm}
fit: H7/s6
";
    let found = faults(text);
    assert_eq!(found.len(), 1);
    assert_eq!(found[0].message, "bore 60 mm is not smaller than the mating diameter 60 mm");
    assert_eq!(place(&found[0]), Some((4, 33, 4)));
    assert_eq!(joint(&text.replacen(", bore: *d", "", 1)).rings[1].material.id, "C45+N");
}

#[test]
fn a_change_is_the_same_as_an_edit() {
    for (change, from, to) in [
        (("fit", "H7/s6"), "fit: H7/u6", "fit: H7/s6"),
        (("hub.outer_diameter", "120mm"), "outer_diameter: 110 mm", "outer_diameter: 120mm"),
        (("hub.material", "1.0060"), "material: C45+QT", "material: 1.0060"),
        (("fit", "{hole: H8, shaft: u7}"), "fit: H7/u6", "fit: {hole: H8, shaft: u7}"),
        (("require.slip_safety", "2"), "fit: H7/u6", "fit: H7/u6\nrequire: {slip_safety: 2}"),
        (("duty.rated.torque", "1 kN.m"), "fit: H7/u6", "fit: H7/u6\nduty: [{state: rated, torque: 1 kN.m}]"),
        (("drawing", "12.50"), "fit: H7/u6", "fit: H7/u6\ndrawing: 12.50"),
    ] {
        let edited = joint(&LEAST.replacen(from, to, 1));
        let changed = set(LEAST, &[change]).unwrap_or_else(|found| panic!("{}", listed(&found)));
        assert_eq!(changed.set, [(change.0.to_owned(), change.1.to_owned())]);
        assert_ne!(changed.digest, edited.digest);
        assert_eq!(
            Joint { set: Vec::new(), digest: String::new(), ..changed },
            Joint { digest: String::new(), ..edited }
        );
    }
}

#[test]
fn faults_in_a_change_name_the_option_not_a_line() {
    let told = |changes: &[(&str, &str)]| {
        let found = set(LEAST, changes).unwrap_err();
        assert_eq!(found.len(), 1, "{}", listed(&found));
        assert_eq!((place(&found[0]), found[0].file.as_deref()), (None, None));
        (found[0].message.clone(), found[0].help.clone().unwrap_or_default())
    };
    assert_eq!(
        told(&[("hub.outer_diameter", "50mm")]).0,
        "--set hub.outer_diameter: outer_diameter 50mm is not larger than the mating diameter 60 mm"
    );
    assert_eq!(
        told(&[("hub.outer_diametr", "50mm")]),
        (
            "--set hub.outer_diametr: unknown key `outer_diametr` in `hub`".to_owned(),
            "did you mean `outer_diameter`?".to_owned()
        )
    );
    assert_eq!(
        told(&[("hubb.outer_diameter", "50mm")]),
        ("--set hubb.outer_diameter: unknown key `hubb`".to_owned(), "did you mean `hub`?".to_owned())
    );
    assert_eq!(told(&[("length", "70")]).0, "--set length: 70 has no unit: write 70 mm");
    assert_eq!(
        told(&[("duty.rated.speed", "100 rpm")]).0,
        "--set duty.rated.speed: `speed` is not supported yet: the loss of contact pressure in rotation is not calculated"
    );
    // A fault in the file itself still has its line.
    let found = set(&LEAST.replacen("70 mm", "70", 1), &[("hub.outer_diameter", "50mm")]).unwrap_err();
    assert_eq!(place(&found[0]), Some((3, 9, 2)));
    assert!(found[1].message.starts_with("--set hub.outer_diameter"));
}

#[test]
fn the_digest_is_that_of_the_file_and_follows_the_changes() {
    // SHA-256 of the empty changes is that of the text: printf of LEAST into sha256sum gives the same.
    let plain = joint(LEAST);
    assert_eq!(plain.digest.len(), 64);
    assert_eq!(plain.digest, joint(LEAST).digest);
    let changed = set(LEAST, &[("length", "71 mm")]).unwrap();
    assert_ne!(plain.digest, changed.digest);
    assert_ne!(changed.digest, set(LEAST, &[("length", "72 mm")]).unwrap().digest);
    assert_ne!(plain.digest, joint(&format!("{LEAST}# a remark\n")).digest);
}

#[test]
fn smoothing_rules_go_by_name() {
    let loss = |smoothing: &str| {
        let joint = joint(&format!("{LEAST}smoothing: {smoothing}\n"));
        ((joint.smoothing.loss[0] * 1e9).round() / 1e3, joint.smoothing.at)
    };
    // Rz 6.3 and 10 µm by default: 0.8 · 16.3 = 13.04, 0.4 · 16.3 = 6.52.
    assert_eq!(loss("DIN 7190:2001"), (13.04, SmoothingAt::Loosest));
    assert_eq!(loss("DIN 7190-1:2017"), (6.52, SmoothingAt::Loosest));
    assert_eq!(loss("{rule: DIN 7190-1:2017, at: both}"), (6.52, SmoothingAt::Both));
    assert_eq!(loss("{factor: 0.4}"), (6.52, SmoothingAt::Loosest));
    assert_eq!(loss("none").1, SmoothingAt::None);
    let found = faults(&format!("{LEAST}smoothing: {{factor: 0.4, rule: GB/T 5371}}\n"));
    assert_eq!(found[0].message, "`factor` and `rule` are both given");
    let found = faults(&format!("{LEAST}smoothing: {{factor: 80}}\n"));
    assert!(found[0].message.starts_with("factor 80 is too large"));
}

fn mutated() -> impl Strategy<Value = String> {
    let piece = prop_oneof![
        Just("\n".to_owned()),
        Just(": ".to_owned()),
        Just("- ".to_owned()),
        Just("{".to_owned()),
        Just("}".to_owned()),
        Just("&a ".to_owned()),
        Just("*a".to_owned()),
        Just("!t ".to_owned()),
        Just("\t".to_owned()),
        Just("\"".to_owned()),
        Just("|\n".to_owned()),
        Just("\u{2028}\r".to_owned()),
        Just("duty".to_owned()),
        Just("1e999 mm".to_owned()),
        "[ -~]{0,6}",
        any::<char>().prop_map(String::from),
    ];
    prop::collection::vec((0..FULL.len(), 0..12_usize, piece), 1..5).prop_map(|edits| {
        let mut text = FULL.to_owned();
        for (at, cut, put) in edits {
            let at = at.min(text.len());
            let start = (0..=at).rev().find(|&i| text.is_char_boundary(i)).unwrap_or(0);
            let end = (start + cut..=text.len()).find(|&i| text.is_char_boundary(i)).unwrap_or(text.len());
            text.replace_range(start..end, &put);
        }
        text
    })
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 400, ..ProptestConfig::default() })]

    #[test]
    fn no_text_makes_the_reader_panic(text in any::<String>()) {
        let _ = read(&text, Path::new("demo.yaml"), &[], &Library::built_in());
    }

    #[test]
    fn no_bytes_make_the_reader_panic(bytes in prop::collection::vec(any::<u8>(), 0..200)) {
        let _ = read_bytes(&bytes, Path::new("demo.yaml"), &[], &Library::built_in());
    }

    #[test]
    fn no_slip_of_the_pen_makes_the_reader_panic(text in mutated()) {
        if let Err(found) = read(&text, Path::new("demo.yaml"), &[], &Library::built_in()) {
            prop_assert!(!found.is_empty());
            for fault in found {
                prop_assert!(!fault.message.is_empty() && fault.width >= 1);
                if let (Some(place), Some(line)) = (fault.place, &fault.line_text) {
                    prop_assert!(place.column <= line.chars().count() + 1, "{fault} in {line:?}");
                }
            }
        }
    }

    #[test]
    fn no_change_makes_the_reader_panic(key in "[a-z_.0-9]{0,12}", value in "[ -~]{0,12}") {
        let _ = set(FULL, &[(&key, &value)]);
    }

    #[test]
    fn any_length_is_read_alike_from_file_and_change(micrometres in 1_000_u32..1_000_000) {
        let text = format!("{}.{:03} mm", micrometres / 1000, micrometres % 1000);
        let edited = joint(&LEAST.replacen("length: 70 mm", &format!("length: {text}"), 1));
        let changed = set(LEAST, &[("length", &text)]).unwrap();
        prop_assert_eq!(edited.length, changed.length);
    }
}
