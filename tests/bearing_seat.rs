//! Bearing seats: limits, loss of clearance, mounting, and what is said about bad keys.

mod common;

use std::path::Path;

use common::{findings_of, hubgrip_in, stdout};
use hubgrip::assembly::bearing::{Elastic, InnerRingFit, OuterRingFit, inner_ring, outer_ring};
use hubgrip::diagnostic::Diagnostic;
use hubgrip::findings::HOOP_LIMIT;
use hubgrip::joint::read;
use hubgrip::material::library::Library;
use serde_json::Value;

const ON_SHAFT: &str = "joint_file: 1\n\
    shaft: {material: C45+QT, roughness: Rz 2.5 um}\n\
    hub: {bearing: {bore: 50 mm, outside_diameter: 90 mm, width: 20 mm}}\n\
    fit: k6\n\
    smoothing: {factor: 0.8, at: none}\n";

const IN_HOUSING: &str = "joint_file: 1\n\
    shaft: {bearing: {bore: 50 mm, outside_diameter: 90 mm, width: 20 mm, type: roller, clearance: C3}}\n\
    hub: {material: EN-GJL-250, outer_diameter: 130 mm, roughness: Rz 4 um}\n\
    fit: {hole: N7}\n\
    smoothing: {factor: 0.8, at: none}\n";

fn faults(text: &str) -> Vec<Diagnostic> {
    read::read(text, Path::new("joint.yaml"), &[], &Library::built_in()).expect_err(text)
}

/// ISO 492 Normal class, bore over 30 to 50 mm 0/−12 µm; ISO 286-2, k6 over 30 to 50 mm +18/+2 µm; ISO 5753-1, groove
/// ball bearings over 40 to 50 mm, CN 6 to 23 µm.
#[test]
fn limits_and_clearance_come_from_the_tables() {
    let findings = findings_of(ON_SHAFT);
    let joint = &findings.joint;
    let interference = joint.fits[0].limits.interference();
    assert!(
        (interference.loosest * 1e6 - 2.0).abs() < 1e-9 && (interference.tightest * 1e6 - 30.0).abs() < 1e-9
    );
    assert!(joint.fits[0].source.contains("ISO 492") && joint.fits[0].source.contains("ISO 286, k6"));
    assert_eq!((joint.diameter, joint.length), (0.05, 0.02));
    assert_eq!(joint.rings[1].name, "inner ring");
    let bearing = findings.bearing.as_ref().unwrap();
    assert!((bearing.before.value.low * 1e6 - 6.0).abs() < 1e-9);
    assert!((bearing.before.value.high * 1e6 - 23.0).abs() < 1e-9);
    let keyed = findings_of(&ON_SHAFT.replace("fit: k6", "fit: {shaft: k6}"));
    assert_eq!(keyed.joint.fits[0].limits, joint.fits[0].limits);
}

/// The loss that the joint finds from its stack of rings is that of the closed form for one ring (Harris and Kotzalas).
#[test]
fn the_loss_agrees_with_the_closed_form() {
    let elastic = |findings: &hubgrip::findings::Findings, ring: usize| {
        let material = &findings.joint.rings[ring].material;
        Elastic { youngs_modulus: material.youngs_modulus.value, poisson: material.poisson.value }
    };
    let findings = findings_of(ON_SHAFT);
    let closed = inner_ring(&InnerRingFit {
        interference: 30e-6,
        bore: 0.05,
        raceway: 0.058,
        shaft_bore: 0.0,
        ring: elastic(&findings, 1),
        shaft: elastic(&findings, 0),
    })
    .unwrap();
    let bearing = findings.bearing.as_ref().unwrap();
    approx::assert_relative_eq!(bearing.loss.tightest, closed.raceway_change, max_relative = 1e-9);
    approx::assert_relative_eq!(bearing.hoop_stress.tightest, closed.hoop_stress, max_relative = 1e-9);
    // Same material: U d/F, and the least of the group less that loss.
    approx::assert_relative_eq!(bearing.mounted.low, 6e-6 - closed.raceway_change, max_relative = 1e-9);

    let findings = findings_of(IN_HOUSING);
    let tightest = findings.joint.fits[0].limits.interference().tightest;
    let closed = outer_ring(&OuterRingFit {
        interference: tightest,
        outside: 0.09,
        raceway: 0.08,
        housing_outside: 0.13,
        ring: elastic(&findings, 0),
        housing: elastic(&findings, 1),
    })
    .unwrap();
    let bearing = findings.bearing.as_ref().unwrap();
    approx::assert_relative_eq!(bearing.loss.tightest, closed.raceway_change, max_relative = 1e-9);
    approx::assert_relative_eq!(bearing.hoop_stress.tightest, closed.hoop_stress, max_relative = 1e-9);
}

/// An inner ring 10 K warmer than the outer takes α ΔT (F + R)/2 = 11.7e-6 × 10 × 70 mm, about 8 µm, and a shaft warmer than
/// the ring presses harder.
#[test]
fn heat_takes_clearance_as_well() {
    let with = |state: &str| {
        let findings = findings_of(&format!("{ON_SHAFT}duty:\n  - {state}\n"));
        findings.bearing.unwrap().states[0]
    };
    let cold = with("{state: cold}");
    assert_eq!(cold.inner_hotter_by, 0.0);
    let even = with("{state: warm, temperature: 70 degC}");
    let taken = (cold.left.low - even.left.low) * 1e6;
    assert!((7.5..9.0).contains(&taken), "{taken}");
    let uneven = with("{state: warm, shaft_temperature: 80 degC, hub_temperature: 70 degC}");
    assert!(uneven.left.low < even.left.low - 4e-6 && uneven.loss.high > even.loss.high);
}

#[test]
fn cautions_follow_the_numbers() {
    let said = |text: &str, words: &str| {
        findings_of(text).cautions.iter().any(|caution| caution.text.contains(words))
    };
    assert!(said(ON_SHAFT, "without clearance or preloaded"));
    let loose = ON_SHAFT.replace("fit: k6", "fit: j5").replace("width: 20 mm", "width: 20 mm, clearance: C4");
    assert!(!said(&loose, "without clearance or preloaded"));
    let tight = ON_SHAFT.replace("fit: k6", "fit: p6");
    assert!(findings_of(&tight).bearing.unwrap().hoop_stress.tightest > HOOP_LIMIT);
    assert!(said(&tight, "may crack") && !said(ON_SHAFT, "may crack"));
    let heated = format!("{ON_SHAFT}assembly: {{method: heat hub, clearance: 20 um}}\n");
    assert!(said(&heated, "sealed or greased"));
    // ISO 5753-1, ball bearings above 180 mm: from memory, so it says so.
    let large = ON_SHAFT
        .replace("bore: 50 mm, outside_diameter: 90 mm", "bore: 200 mm, outside_diameter: 310 mm")
        .replace("shaft: {", "shaft: {section: 100 mm, ");
    assert!(said(&large, "rests on memory"));
}

/// Bearings are not heated above 120 °C (bearing makers' mounting guidelines).
#[test]
fn heating_keeps_to_the_limit_of_bearings() {
    let of = |clearance: &str, material: &str| {
        let text = ON_SHAFT.replace("hub: {", &format!("hub: {{{material}"));
        findings_of(&format!("{text}assembly: {{method: heat hub, clearance: {clearance}}}\n"))
    };
    for material in ["", "material: C45+QT, "] {
        let cool = of("20 um", material);
        assert!(cool.bearing.as_ref().unwrap().mounting_possible, "{material}");
        assert!(cool.bearing.unwrap().mounting_temperature.unwrap() < 393.15);
    }
    let hot = of("60 um", "");
    assert!(!hot.bearing.as_ref().unwrap().mounting_possible);
    assert!(
        hot.verdicts.iter().any(|verdict| !verdict.ok && verdict.subject.contains("inner ring temperature"))
    );
}

#[test]
fn the_example_shows_the_bearing_everywhere() {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("examples");
    let text = stdout(&hubgrip_in(&folder, &["check", "bearing-on-shaft.yaml"]));
    assert!(text.contains("left after mounting") && text.contains("clearance C3"), "{text}");
    let found = hubgrip_in(&folder, &["check", "--json", "bearing-on-shaft.yaml"]);
    assert_eq!(found.status.code(), Some(0));
    let found: Value = serde_json::from_str(&stdout(&found)).unwrap();
    let bearing = &found["bearing"];
    assert_eq!(bearing["ring"], "inner");
    assert_eq!(bearing["clearance_before"], serde_json::json!({"least_um": 18.0, "greatest_um": 36.0}));
    assert_eq!(bearing["states"].as_array().unwrap().len(), 2);
    assert_eq!(bearing["mounting_temperature_within_limit"], true);
    let page = stdout(&hubgrip_in(&folder, &["report", "bearing-on-shaft.yaml", "-o", "-"]));
    assert!(page.contains("What the seat does to the bearing"));
    // The worksheet in the page: Δ with its index as MathML, and its plain twin.
    assert!(page.contains("Bearing: radial internal clearance, shop temperature"));
    assert!(page.contains("<msub><mi>Δ</mi><mrow><mtext>max</mtext></mrow></msub>"));
    assert!(page.contains("a_min = g_min - Delta_max = 18 - "));
    let housed = stdout(&hubgrip_in(&folder, &["report", "bearing-in-housing.yaml", "-o", "-"]));
    assert!(housed.contains("hoop stress in the outer ring at its raceway, compression, tightest pair"));
    let plain = hubgrip_in(&folder, &["check", "--json", "fan-hub.yaml"]);
    assert_eq!(serde_json::from_str::<Value>(&stdout(&plain)).unwrap()["bearing"], Value::Null);
}

#[test]
fn bad_keys_are_told_with_their_place_and_the_way_out() {
    let cases = [
        ("fit: k6", "fit: H7/k6", "", "write the class of the shaft alone, such as `fit: k6`", "H7/k6"),
        ("fit: k6", "fit: N7", "`N7` is a class for a hole", "did you mean `n7`?", "N7"),
        ("width: 20 mm", "widht: 20 mm", "unknown key `widht`", "did you mean `width`?", "widht"),
        (", width: 20 mm", "", "`width` is missing in `hub.bearing`", "`width: 20 mm`", "bearing"),
        ("90 mm", "40 mm", "outside_diameter 40 mm is not larger than the bore 50 mm", "", "40 mm"),
        ("20 mm}", "20 mm, type: bal}", "`bal` is not a kind of bearing", "did you mean `ball`?", "bal}"),
        ("20 mm}", "20 mm, clearance: C6}", "`C6` is not a clearance group", "C2", "C6"),
        ("20 mm}", "20 mm, class: 4}", "`4` is not a tolerance class of ISO 492", "normal", "4}"),
        ("20 mm}", "20 mm, inner_raceway: 95 mm}", "does not lie between", "", "95 mm"),
        (
            "bearing: {",
            "outer_diameter: 58 mm, bearing: {",
            "`outer_diameter` stands beside `bearing`",
            "take one",
            "outer_diameter",
        ),
        (
            "shaft: {",
            "shaft: {steps: [{length: 20 mm, bore: 10 mm}], ",
            "`steps` do not go with `bearing`",
            "one section",
            "steps",
        ),
        (
            "joint_file: 1",
            "joint_file: 1\ndiameter: 60 mm",
            "diameter 60 mm is not the bore of the bearing, 50 mm",
            "",
            "60 mm",
        ),
    ];
    for (from, to, message, help, needle) in cases {
        let text = ON_SHAFT.replacen(from, to, 1);
        let found = faults(&text);
        let told = &found[0];
        assert!(told.message.contains(message), "{to}: {found:?}");
        assert!(told.help.as_deref().unwrap_or("").contains(help), "{to}: {found:?}");
        let (line, column) = text
            .lines()
            .enumerate()
            .find_map(|(line, row)| Some((line + 1, row.find(needle)? + 1)))
            .expect("the needle is there");
        assert_eq!(
            told.place.map(|place| (place.line, place.column)),
            Some((line, column)),
            "{to}: {found:?}"
        );
        assert_eq!(found.len(), 1, "{to}: {found:?}");
    }
    let large =
        ON_SHAFT.replace("bore: 50 mm, outside_diameter: 90 mm", "bore: 300 mm, outside_diameter: 420 mm");
    assert!(faults(&large)[0].message.contains("no clearance is known"), "{:?}", faults(&large));
    let both = ON_SHAFT.replace("shaft: {material: C45+QT", "shaft: {bearing: {bore: 20 mm}");
    assert!(faults(&both).iter().any(|fault| fault.message == "both parts are bearings"));
}
