//! Faults in the keys and texts of a joint file: the words, the place, the way out.

mod joint_support;

use joint_support::{FULL, LEAST, case, check, faults, listed, missing, place, set};

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
                "dry ice, dry ice in alcohol, dry ice in acetone, liquid nitrogen",
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
                    "require: {slip_safety: 1.4, yield_safety: 1.1, fracture_safety: 2.2, press_force: 300 kN, allow: elastic}",
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

/// A joint of three rings with everything that it needs.
const RINGS: &str = "\
joint_file: 1
length: 60 mm
rings:
  - {material: C45+N, bore: 30 mm, outer_diameter: 60 mm}
  - {material: C45+N, outer_diameter: 100 mm}
  - {material: C45+N, outer_diameter: 160 mm}
fits: [H7/s6, H7/u6]
order: [2, 1]
duty:
  - {state: work, inner_pressure: 100 MPa, speed: 1000 rpm, inner_temperature: 80 degC, outer_temperature: 40 degC}
";

/// A stepped hub on a shaft whose bore changes.
const STEPPED: &str = "\
joint_file: 1
diameter: 50 mm
length: 40 mm
shaft: {material: C45+N, steps: [{length: 20 mm, bore: 0 mm}, {length: 20 mm, bore: 20 mm}]}
hub: {material: C45+N, steps: [{length: 15 mm, outer_diameter: 75 mm}, {length: 25 mm, outer_diameter: 100 mm}]}
fit: H7/s6
duty:
  - {state: work, bending_moment: 100 N.m, radial_force: 1 kN, rotating_bending: yes, reversing: no}
require: {allow: plastic, plastic_share: 0.2, yield_rule: von Mises}
";

#[test]
fn the_keys_of_several_rings_and_of_service_are_read() {
    let rings = set(RINGS, &[]).expect("the rings are read");
    assert_eq!((rings.rings.len(), rings.order), (3, vec![1, 0]));
    let drops: f64 = rings.duty[0].temperature_rises.iter().sum();
    assert!((drops + 40.0).abs() < 1e-9, "the gradient ends at the outer temperature: {drops}");
    let stepped = set(STEPPED, &[]).expect("the steps are read");
    assert_eq!(stepped.slices.len(), 3);
    assert!(stepped.duty[0].rotating_bending && !stepped.duty[0].reversing);
}

#[test]
fn faults_of_the_keys_of_several_rings_and_of_service_have_their_place() {
    for (text, from, to, at, words) in [
        (RINGS, "fits: [H7/s6, H7/u6]", "fits: [H7/s6]", (7, 7), "3 rings need 2 fits"),
        (RINGS, "order: [2, 1]", "order: [2, 2]", (8, 12), "stands twice"),
        (RINGS, "order: [2, 1]", "order: [2, 3]", (8, 12), "is no fit"),
        (RINGS, "order: [2, 1]", "order: [2]", (8, 8), "names 1 of 2 fits"),
        (RINGS, "outer_diameter: 100 mm", "outer_diameter: 50 mm", (5, 39), "not larger than"),
        (RINGS, "length: 60 mm", "length: 60 mm\ndiameter: 60 mm", (3, 1), "both given"),
        (
            RINGS,
            "  - {material: C45+N, outer_diameter: 100 mm}",
            "  - {material: C45+N, bore: 60 mm, outer_diameter: 100 mm}",
            (5, 23),
            "only the innermost",
        ),
        (RINGS, "bore: 30 mm, ", "", (10, 35), "is solid"),
        (RINGS, ", outer_temperature: 40 degC", "", (10, 61), "one end of the gradient"),
        (
            RINGS,
            "inner_temperature: 80 degC",
            "temperature: 50 degC, inner_temperature: 80 degC",
            (10, 61),
            "both given",
        ),
        (RINGS, "speed: 1000 rpm", "speed: -1 rpm", (10, 51), "must not be negative"),
        (STEPPED, "{length: 15 mm,", "{length: 10 mm,", (5, 24), "the steps are 35 mm long"),
        (STEPPED, "outer_diameter: 75 mm", "outer_diameter: 45 mm", (5, 64), "not larger than"),
        (STEPPED, "bore: 20 mm", "bore: 50 mm", (4, 85), "not smaller than"),
        (STEPPED, "rotating_bending: yes", "rotating_bending: maybe", (8, 82), "maybe"),
        (RINGS, "speed: 1000 rpm", "temperatures: [20 degC]", (10, 44), "both given"),
        (RINGS, "inner_pressure: 100 MPa", "inner_pressure: 100 mm", (10, 35), "is a length"),
        (RINGS, "inner_pressure: 100 MPa", "outer_pressure: -1 MPa", (10, 35), "must not be negative"),
        (RINGS, "speed: 1000 rpm", "relaxation: 0", (10, 56), "more than 0 and at most 1"),
        (RINGS, "speed: 1000 rpm", "relaxation: 1.5", (10, 56), "more than 0 and at most 1"),
        (STEPPED, "bending_moment: 100 N.m", "bending_moment: -100 N.m", (8, 35), "must not be negative"),
        (STEPPED, "radial_force: 1 kN", "radial_force: 1 N.m", (8, 58), "is a torque"),
        (STEPPED, "reversing: no", "reversing: 3", (8, 98), "3"),
        (STEPPED, "{length: 20 mm, bore: 0 mm}", "{bore: 0 mm}", (4, 34), "`length` is missing"),
        (
            STEPPED,
            "{length: 15 mm, outer_diameter: 75 mm}",
            "{length: 15 mm}",
            (5, 32),
            "`outer_diameter` is missing",
        ),
        (
            STEPPED,
            "hub: {material: C45+N, steps: [{length: 15 mm",
            "hub: {material: EN-GJL-250, steps: [{length: 15 mm",
            (9, 18),
            "is for a ductile hub",
        ),
        (STEPPED, "allow: plastic", "allow: yes", (9, 18), "yes"),
        (STEPPED, "plastic_share: 0.2", "plastic_share: 1.2", (9, 42), "at most 1"),
        (STEPPED, "allow: plastic", "allow: elastic", (9, 42), "needs `allow: plastic`"),
        (STEPPED, "yield_rule: von Mises", "yield_rule: Mohr", (9, 59), "Mohr"),
        (STEPPED, "fit: H7/s6", "fit: H7/s6\nfits: [H7/s6]", (7, 1), "goes with `rings`"),
    ] {
        assert!(text.contains(from), "{from} is not there to change");
        let found = faults(&text.replacen(from, to, 1));
        assert_eq!(found.len(), 1, "{to}: {}", listed(&found));
        let placed = place(&found[0]).map(|(line, column, _)| (line, column));
        assert_eq!(placed, Some(at), "{to}: {}", listed(&found));
        assert!(found[0].message.contains(words), "{to}: {}", listed(&found));
    }
}

#[test]
fn the_fits_of_several_rings_are_asked_for() {
    let found = faults(&RINGS.replacen("fits: [H7/s6, H7/u6]\norder: [2, 1]\n", "", 1));
    assert_eq!(found.len(), 1, "{}", listed(&found));
    assert_eq!(found[0].message, "`fits` is missing");
}

#[test]
fn temperatures_are_given_once() {
    let state = "inner_temperature: 80 degC, outer_temperature: 40 degC";
    let all = "temperatures: [20 degC, 20 degC, 20 degC]";
    let found = faults(&RINGS.replacen(state, &format!("temperature: 50 degC, {all}"), 1));
    assert_eq!(found.len(), 1, "{}", listed(&found));
    assert!(found[0].message.contains("both given"), "{}", found[0].message);
    let found = faults(&RINGS.replacen(state, "temperatures: [20 degC]", 1));
    assert_eq!(found[0].message, "`temperatures` has 1 for 3 rings");
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
  - {torque: 3 kg, speed: 10}
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
            Some((9, 27)),
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
