//! Rules that a joint must keep: fits, friction, temperatures, states, materials in place.

mod joint_support;

use joint_support::{FULL, LEAST, case, check, faults, joint, listed, place};

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
    assert_eq!(unnamed.duty[0].called(), "state 1", "not: state state 1");
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
                "200 has no unit: write 200 GPa",
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
fn a_relief_leaves_something_of_a_bearing() {
    let text = "joint_file: 1\nrelief: 20 mm\nshaft: {material: C45+N}\n\
                hub: {bearing: {bore: 50 mm, outside_diameter: 90 mm, width: 20 mm}}\nfit: k6\n";
    let found = faults(text);
    assert_eq!(found.len(), 1, "{found:?}");
    assert_eq!(place(&found[0]), Some((2, 9, 5)));
    assert_eq!(found[0].message, "relief 20 mm leaves nothing of the width 20 mm of the bearing");
}

#[test]
fn the_rings_of_a_bearing_differ_by_what_they_can() {
    let text = "joint_file: 1\nshaft: {material: C45+N}\nhub: {bearing: {bore: 50 mm, outside_diameter: 90 mm, \
                width: 20 mm, inner_hotter_by: 5000 K}}\nfit: k6\n";
    let found = faults(text);
    assert_eq!(found.len(), 1, "{found:?}");
    assert_eq!(place(&found[0]), Some((3, 86, 6)));
    let told =
        "inner_hotter_by 5000 K is more than the rings of a bearing differ by: at most 100 K either way";
    assert_eq!(found[0].message, told);
}
