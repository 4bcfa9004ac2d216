//! Young's modulus at temperature, from the joint file to the findings: closed forms by hand, everywhere it is used,
//! properties, and what is said.

mod warm_joints;

use std::f64::consts::PI;
use std::path::Path;

use approx::assert_relative_eq;
use hubgrip::findings::Findings;
use hubgrip::joint::read;
use hubgrip::material::library::Library;
use hubgrip::mechanics::plastic::{HubYield, PlasticJoint, YieldRule};
use hubgrip::mechanics::two_rings::TwoRings;
use hubgrip::numerics::root::bracketed;
use hubgrip::population::scatter::{self, Settings, understood::understood};
use proptest::prelude::*;
use warm_joints::{ALUMINIUM, ALUMINIUM_CURVE, STEEL, STEEL_CURVE, findings, joint, material, two_parts};

/// p = (U + d (ε_s − ε_h)) / (d (C_h/E_h + C_s/E_s)), C_h = 5/3 + ν_h for Q = 1/2, C_s = 1 − ν_s (Lamé; Timoshenko &
/// Goodier, § 28).
fn lame(interference: f64, strains: [f64; 2], moduli: [f64; 2], poisson: [f64; 2]) -> f64 {
    let flexibility = (1.0 - poisson[0]) / moduli[0] + (5.0 / 3.0 + poisson[1]) / moduli[1];
    (interference + 0.05 * (strains[0] - strains[1])) / (0.05 * flexibility)
}

// ---- closed forms

/// Steel on steel, U = 50 µm, both at 120 °C: E is 190 of 200 GPa in both, the strains are alike, so the 75 MPa of Lamé become
/// 75 × 0.95 = 71.25 MPa, and the hoop stress at the bore 5/3 of it. With the hub alone at 220 °C and the shaft at 120 °C:
/// p = (50e-6 − 0.05 × 12e-6 × 100)/(…) is a clearance; at U = 100 µm it is 40e-6/(0.05 (0.7/190e9 + (5/3 + 0.3)/170e9)).
#[test]
fn two_rings_by_hand() {
    let steel = material(STEEL, STEEL_CURVE);
    let duty = "duty:\n  - {state: cold, torque: 1 N.m}\n  - {state: hot, torque: 1 N.m, temperature: 120 degC}\n  \
                - {state: hub hot, shaft_temperature: 120 degC, hub_temperature: 220 degC}\n";
    let found = findings(&two_parts(&steel, &steel, 50.0, duty));
    assert_relative_eq!(found.duty[0].loosest.pressure, 75e6, max_relative = 1e-9);
    assert_relative_eq!(found.duty[1].loosest.pressure, 71.25e6, max_relative = 1e-9);
    assert_relative_eq!(found.duty[1].loosest.rings[1].bore.hoop, 5.0 / 3.0 * 71.25e6, max_relative = 1e-9);
    assert_eq!(found.duty[2].loosest.pressure, 0.0);
    assert_eq!(found.duty[0].youngs_moduli, [200e9, 200e9]);
    assert_relative_eq!(found.duty[1].youngs_moduli[0], 190e9, max_relative = 1e-12);
    let found = findings(&two_parts(&steel, &steel, 100.0, duty));
    let expected = 40e-6 / (0.05 * (0.7 / 190e9 + (5.0 / 3.0 + 0.3) / 170e9));
    assert_relative_eq!(found.duty[2].loosest.pressure, expected, max_relative = 1e-9);
}

/// An aluminium hub, both parts at 120 °C: E 190 and 0.9 × 70 GPa, strains 1.2 and 2.3 per mille.
#[test]
fn two_materials_by_hand() {
    let (shaft, hub) = (material(STEEL, STEEL_CURVE), material(ALUMINIUM, ALUMINIUM_CURVE));
    let rest = "duty:\n  - {state: hot, torque: 1 N.m, temperature: 120 degC}\n  - {state: frost, temperature: -60 degC}\n";
    let found = findings(&two_parts(&shaft, &hub, 100.0, rest));
    let hot = lame(100e-6, [1.2e-3, 2.3e-3], [190e9, 63e9], [0.3, 0.33]);
    assert_relative_eq!(found.duty[0].loosest.pressure, hot, max_relative = 1e-9);
    let frost = lame(100e-6, [-0.96e-3, -1.84e-3], [208e9, 73.5e9], [0.3, 0.33]);
    assert_relative_eq!(found.duty[1].loosest.pressure, frost, max_relative = 1e-9);
    let note =
        found.notes.iter().find(|note| note.starts_with("Young's modulus is taken at the temperature"));
    assert!(note.is_some(), "{:?}", found.notes);
}

/// The shop at 120 °C: pairs, capacity, onset of yield and opening speed all with 190 GPa. The opening speed is
/// √(2 E δ/((3 + ν) ρ a b²)) (equal materials, solid shaft; Timoshenko & Goodier, § 32), the onset by von Mises p = Re (1 − Q²)/√(3 + Q⁴).
#[test]
fn a_hot_shop_has_its_moduli() {
    let steel = material(STEEL, STEEL_CURVE);
    let found = findings(&two_parts(&steel, &steel, 50.0, "assembly: {shop_temperature: 120 degC}\n"));
    assert_relative_eq!(found.extremes.mean.pressure, 71.25e6, max_relative = 1e-9);
    let speed = (2.0 * 190e9 * 50e-6 / (3.3 * 7800.0 * 0.025 * 0.05 * 0.05_f64)).sqrt();
    assert_relative_eq!(found.service.loosening[0].speed.unwrap(), speed, max_relative = 1e-9);
    let onset = found.onset_of_yield.unwrap();
    let pressure = 900e6 * 0.75 / 3.0625_f64.sqrt();
    assert_relative_eq!(onset.pressure, pressure, max_relative = 1e-9);
    assert_relative_eq!(onset.interference, 50e-6 * pressure / 71.25e6, max_relative = 1e-9);
    let plastic = found.service.plastic.unwrap();
    // Tresca: p = Re (1 − Q²)/2.
    assert_relative_eq!(
        plastic.limits.onset_interference,
        50e-6 * 900e6 * 0.375 / 71.25e6,
        max_relative = 1e-9
    );
}

/// Two rings open at ΔT = δ/(d (α_h − α_s)), whatever their moduli do on the way (Timoshenko & Goodier, chapter 13): 100 µm on
/// 50 mm with 11e-6 /K is 181.8182 K.
#[test]
fn two_rings_loosen_at_the_same_temperature_with_any_modulus() {
    let at = |shaft: &str, hub: &str| {
        let text = two_parts(&material(STEEL, shaft), &material(ALUMINIUM, hub), 100.0, "");
        let loosening = findings(&text).service.loosening[0];
        (loosening.temperature.unwrap(), loosening.outer_temperature.unwrap())
    };
    let soft = at(STEEL_CURVE, ALUMINIUM_CURVE);
    let stiff = at("", "");
    assert_relative_eq!(soft.0, 293.15 + 100e-6 / (0.05 * 11e-6), max_relative = 1e-12);
    assert_relative_eq!(soft.1, 293.15 + 100e-6 / (0.05 * 23e-6), max_relative = 1e-12);
    assert_relative_eq!(soft.0, stiff.0, max_relative = 1e-12);
    assert_relative_eq!(soft.1, stiff.1, max_relative = 1e-12);
}

/// Of three rings an interface feels how stiff the others are: the core pushes the middle ring outwards by a share of their
/// interference that depends on the ratio of their moduli. At the temperature that is found for the hoop, a state has no
/// pressure left there; it is not the temperature of rings that keep their moduli.
#[test]
fn three_rings_loosen_where_their_pressure_ends() {
    let of = |curve: &str, rest: &str| {
        let (core, middle, hoop) = (material(STEEL, curve), material(STEEL, ""), material(ALUMINIUM, ""));
        findings(&format!(
            "joint_file: 1\nlength: 40 mm\nsmoothing: {{factor: 0}}\nrings:\n  - {{name: core, {core}, bore: 0 mm, \
             outer_diameter: 40 mm}}\n  - {{name: middle, {middle}, outer_diameter: 60 mm}}\n  - {{name: hoop, {hoop}, \
             outer_diameter: 80 mm}}\nfits:\n  - {{hole: {{lower: 0 um, upper: 0 um}}, shaft: {{lower: 80 um, upper: 80 um}}}}\n  \
             - {{hole: {{lower: 0 um, upper: 0 um}}, shaft: {{lower: 50 um, upper: 50 um}}}}\n{rest}"
        ))
    };
    let loose = of(STEEL_CURVE, "").service.loosening[1].temperature.unwrap();
    let pressure = |offset: f64| {
        let duty = format!("duty: [{{state: hot, temperature: {} K}}]\n", loose + offset);
        of(STEEL_CURVE, &duty).duty[0].loosest.interfaces[1].pressure
    };
    assert!(pressure(-0.01) > 0.0 && pressure(0.01) == 0.0, "{} {}", pressure(-0.01), pressure(0.01));
    let stiff = of("", "").service.loosening[1].temperature.unwrap();
    // By hand: the rim of the middle ring, b/a = 3/2, grows by 2 p a² b/(E (b² − a²)) · 2 on the diameter, p that of the core alone.
    let grown = |core: f64| {
        let contact = 80e-6 / (0.04 * (0.7 / core + (13.0 / 5.0 + 0.3) / 200e9));
        4.0 * contact * 0.02_f64.powi(2) * 0.03 / (200e9 * (0.03_f64.powi(2) - 0.02_f64.powi(2)))
    };
    assert_relative_eq!(stiff, 293.15 + (50e-6 + grown(200e9)) / (0.06 * 11e-6), max_relative = 1e-9);
    let core = found_modulus(loose);
    assert_relative_eq!(loose, 293.15 + (50e-6 + grown(core)) / (0.06 * 11e-6), max_relative = 1e-9);
    assert!(loose < stiff - 0.5, "{loose} {stiff}");
}

/// Modulus of the steel of these tests at a temperature, Pa.
fn found_modulus(kelvin: f64) -> f64 {
    let text = format!("{{{STEEL}, {STEEL_CURVE}}}");
    let material =
        hubgrip::material::yaml::read(&text, "steel", hubgrip::material::Origin::JointFile).unwrap();
    material.youngs_modulus_at(kelvin).unwrap()
}

// ---- what else is solved at other temperatures

/// A point on a line of the envelope, put into the joint as a state, has the pressure of the line.
#[test]
fn the_envelope_is_made_of_states() {
    let (shaft, hub) = (material(STEEL, STEEL_CURVE), material(ALUMINIUM, ALUMINIUM_CURVE));
    let text = |more: &str| {
        let rated = "{state: rated, torque: 300 N.m, speed: 6000 rpm, hub_temperature: 70 degC}";
        two_parts(&shaft, &hub, 150.0, &format!("duty:\n  - {rated}\n{more}"))
    };
    let found = findings(&text(""));
    let envelope = found.envelope().unwrap().unwrap();
    assert_relative_eq!(envelope.states[0].temperature, 343.15, max_relative = 1e-9);
    let mut compared = 0;
    for line in &envelope.lines {
        for (speed, kelvin) in line.points.iter().step_by(7) {
            let rpm = speed * 30.0 / PI;
            let found = findings(&text(&format!(
                "  - {{state: point, speed: {rpm} rpm, hub_temperature: {kelvin} K}}\n"
            )));
            let pressure = found.duty[1].loosest.pressure;
            assert!(
                (pressure - line.pressure).abs() < 1.0,
                "{:?}: {pressure} {}",
                line.meaning,
                line.pressure
            );
            compared += 1;
        }
    }
    assert!(compared > 20, "{compared}");
}

fn yielding(duty: &str) -> Findings {
    let soft = STEEL.replace(
        "yield_strength: 900 MPa, tensile_strength: 1100 MPa",
        "yield_strength: 300 MPa, tensile_strength: 500 MPa",
    );
    let text = two_parts(
        &material(STEEL, STEEL_CURVE),
        &material(&soft, STEEL_CURVE),
        125.0,
        &format!("require: {{allow: plastic}}\n{duty}"),
    );
    findings(&text)
}

/// The joint whose hub has grown by G in assembly acts as an elastic one of U − G with the moduli of the state: at 120 °C the
/// pressure is 0.95 of that at 20 °C. A hub that is cold on a hot shaft is strained further: what it loses of its grip is
/// no less than with the elastic-plastic solution at the moduli of the state.
#[test]
fn a_yielded_hub_is_as_soft_as_its_temperature() {
    let found = yielding(
        "duty:\n  - {state: cold, torque: 1 N.m}\n  - {state: hot, torque: 1 N.m, temperature: 120 degC}\n",
    );
    let worn = found.service.plastic.as_ref().unwrap().worn.as_ref().unwrap();
    assert_eq!(worn.state, None);
    let left = 125e-6 - worn.loosest;
    let elastic = lame(left, [0.0; 2], [200e9; 2], [0.3; 2]);
    assert_relative_eq!(found.duty[0].loosest.pressure, elastic, max_relative = 1e-6);
    assert_relative_eq!(found.duty[1].loosest.pressure, 0.95 * elastic, max_relative = 1e-6);
    assert!(found.notes.iter().any(|note| note.contains("counted at its upper bound")), "{:?}", found.notes);

    let found =
        yielding("duty:\n  - {state: start, shaft_temperature: 120 degC, hub_temperature: 70 degC}\n");
    let worn = found.service.plastic.as_ref().unwrap().worn.as_ref().unwrap();
    assert_eq!(worn.state, Some(0));
    let moduli = &found.duty[0].youngs_moduli;
    assert!(moduli[0] < moduli[1] && moduli[1] < 200e9);
    let joint = PlasticJoint::new(HubYield {
        rings: TwoRings {
            diameter: 0.05,
            hub_outer_diameter: 0.1,
            shaft_bore: 0.0,
            hub_youngs_modulus: moduli[1],
            hub_poisson: 0.3,
            shaft_youngs_modulus: moduli[0],
            shaft_poisson: 0.3,
        },
        rule: YieldRule::Tresca,
        hub_yield_strength: 300e6,
        shaft_yield_strength: 900e6,
    })
    .unwrap();
    let there = joint.solve(125e-6 + 0.05 * 12e-6 * 50.0).unwrap().permanent.bore;
    assert!(worn.loosest >= there && worn.loosest < 1.1 * there, "{} {there}", worn.loosest);
    // And the state's own pressure is the elastic one of what is left.
    let left = lame(125e-6 - worn.loosest, [1.2e-3, 0.6e-3], [moduli[0], moduli[1]], [0.3; 2]);
    assert_relative_eq!(found.duty[0].loosest.pressure, left, max_relative = 1e-6);
}

/// Holes alike between their limits, all else fixed: the share that slips is that of the interferences below the one that
/// Lamé with the moduli of the state needs.
#[test]
fn a_population_slips_by_the_moduli_of_its_state() {
    let (shaft, hub) = (material(STEEL, STEEL_CURVE), material(ALUMINIUM, ALUMINIUM_CURVE));
    // T = μ p π d² L/2: 12 MPa at a friction of 0.12.
    let wanted = 12e6;
    let torque = 0.12 * wanted * PI * 0.05 * 0.05 * 0.04 / 2.0;
    let text = format!(
        "joint_file: 1\ndiameter: 50 mm\nlength: 40 mm\nshaft: {{{shaft}}}\nhub: {{{hub}, outer_diameter: 100 mm}}\n\
         fit: {{hole: {{lower: 0 um, upper: 60 um}}, shaft: {{lower: 130 um, upper: 130 um}}}}\n\
         friction: {{holding: 0.12}}\nsmoothing: {{factor: 0}}\npopulation: {{hole: {{uniform: limits}}, friction: 0.12}}\n\
         duty: [{{state: hot, torque: {torque:.9} N.m, temperature: 120 degC}}]\n"
    );
    let joint = joint(&text);
    let model = understood(&joint, &mut |_, _| unreachable!("no list")).unwrap().model;
    let found = scatter::scatter(model, Settings { samples: 200_000, seed: 1, slip_safety: 1.2 }).unwrap();
    let needed = bracketed(
        |interference| lame(interference, [1.2e-3, 2.3e-3], [190e9, 63e9], [0.3, 0.33]) - wanted,
        0.0,
        1e-3,
        0.0,
    )
    .unwrap();
    let share = (needed - 70e-6) / 60e-6;
    assert!((0.1..0.9).contains(&share), "{share}");
    assert!((found.slips[0].probability - share).abs() < 1e-6, "{} {share}", found.slips[0].probability);
    assert!(found.slips[0].agrees());
    let band = hubgrip::population::sort::required_band(&joint).unwrap();
    let safe = bracketed(
        |interference| {
            lame(interference, [1.2e-3, 2.3e-3], [190e9, 63e9], [0.3, 0.33])
                - joint.require.slip_safety * wanted
        },
        0.0,
        1e-3,
        0.0,
    )
    .unwrap();
    assert_relative_eq!(band.0.unwrap(), safe, max_relative = 1e-6);
}

// ---- properties

proptest! {
    #![proptest_config(ProptestConfig::with_cases(64))]

    /// Both parts expand alike, so heat changes no interference: a hub that is softer when hotter never raises the pressure,
    /// and the softer of two hubs has the lesser one.
    #[test]
    fn a_softer_hub_never_raises_the_pressure(
        modulus in 60.0..220.0_f64,
        fall in 0.0..0.5_f64,
        more in 0.0..0.4_f64,
        celsius in 20.0..220.0_f64,
        interference in 5.0..150.0_f64,
        bore in 0.0..40.0_f64,
    ) {
        let hot = |fall: f64| {
            let base = STEEL.replace("200 GPa", &format!("{modulus} GPa"));
            let curve = format!("youngs_modulus_curve: {{ratios: [[20 degC, 1], [220 degC, {}]]}}", 1.0 - fall);
            let shaft = format!("{}, bore: {bore} mm", material(STEEL, ""));
            let duty = format!("duty:\n  - {{state: cold}}\n  - {{state: hot, temperature: {celsius} degC}}\n");
            let found = findings(&two_parts(&shaft, &material(&base, &curve), interference, &duty));
            (found.duty[0].loosest.pressure, found.duty[1].loosest.pressure)
        };
        let (cold, warm) = hot(fall);
        let (_, softer) = hot(fall + more);
        prop_assert!(warm <= cold * (1.0 + 1e-12), "{cold} {warm}");
        prop_assert!(softer <= warm * (1.0 + 1e-12), "{warm} {softer}");
    }
}

// ---- what is said

/// Grey iron has no curve: nothing is said at 60 °C, and from 50 K on the note names material, ring and state. A polymer
/// softens steeply, and the note comes from 10 K on.
#[test]
fn a_material_without_data_keeps_its_modulus_and_says_so() {
    let notes = |hub: &str, celsius: u32| {
        let duty = format!("duty: [{{state: works, hub_temperature: {celsius} degC}}]\n");
        let found =
            findings(&two_parts("material: C45+N", &format!("material: {hub}, section: 20 mm"), 50.0, &duty));
        let own = found.joint.rings[1].material.youngs_modulus.value;
        assert_eq!(found.duty[0].youngs_moduli[1], own);
        found.notes.into_iter().filter(|note| note.contains("no data of Young's modulus")).collect::<Vec<_>>()
    };
    assert!(notes("EN-GJL-250", 60).is_empty());
    let told = notes("EN-GJL-250", 75);
    assert_eq!(told.len(), 1);
    assert!(
        told[0].starts_with("EN-GJL-250 (hub) has no data of Young's modulus against temperature: 110 GPa, that of 20 °C, is taken in works (75 °C)"),
        "{told:?}"
    );
    assert!(notes("PA66", 28).is_empty());
    assert!(notes("PA66", 40)[0].contains("softens steeply with heat"));
}

/// A temperature beyond the curve is refused where it is written.
#[test]
fn a_temperature_beyond_the_curve_is_told_with_its_place() {
    let steel = material(STEEL, STEEL_CURVE);
    let text = two_parts(&steel, &steel, 50.0, "duty: [{state: hot, temperature: 250 degC}]\n");
    let faults = read::read(&text, Path::new("test.yaml"), &[], &Library::built_in()).unwrap_err();
    let fault = &faults[0];
    assert!(
        fault.message.contains("is outside the curve of Young's modulus of")
            && fault.message.contains("which runs from -60 degC to 220 degC"),
        "{}",
        fault.message
    );
    let place = fault.place.unwrap();
    let line = text.lines().nth(place.line - 1).unwrap();
    assert!(line[place.column - 1..].starts_with("250 degC"), "{line} {place:?}");
}

/// A bad table in a material written in the joint file stands under its own line and column.
#[test]
fn a_bad_table_in_the_joint_file_is_told_with_its_place() {
    for (curve, message, meant) in [
        ("{moduli: [[20 degC, 200 GPa]]}", "a table needs at least two rows", "[[20 degC"),
        (
            "{moduli: [[20 degC, 200 GPa], [20 degC, 190 GPa]]}",
            "temperatures must rise",
            "[20 degC, 190 GPa]",
        ),
        ("{moduli: [[20 degC, 200 GPa], [90 degC, -1 GPa]]}", "must be greater than zero", "[90 degC"),
        ("{moduli: [[50 degC, 200 GPa], [90 degC, 190 GPa]]}", "does not reach 20 degC", "[[50 degC"),
    ] {
        let steel = material(STEEL, &format!("youngs_modulus_curve: {curve}"));
        let text = two_parts("material: C45+N", &steel, 50.0, "");
        let faults = read::read(&text, Path::new("test.yaml"), &[], &Library::built_in()).unwrap_err();
        let fault = &faults[0];
        assert!(fault.message.contains(message), "{curve}: {}", fault.message);
        let place = fault.place.unwrap();
        assert_eq!(place.line, 5, "{fault:?}");
        let line = text.lines().nth(4).unwrap();
        assert!(line[place.column - 1..].starts_with(meant), "{curve}: column {} of {line}", place.column);
    }
}

fn run(arguments: &[&str]) -> String {
    let output = std::process::Command::new(env!("CARGO_BIN_EXE_hubgrip")).args(arguments).output().unwrap();
    assert!(output.status.code().is_some_and(|code| code < 2), "{}", String::from_utf8_lossy(&output.stderr));
    String::from_utf8(output.stdout).unwrap()
}

/// The example: its JSON has the moduli of each state, its report the table and the worksheet line, `materials` the curve.
#[test]
fn every_output_shows_the_modulus_at_temperature() {
    let example = concat!(env!("CARGO_MANIFEST_DIR"), "/examples/hot-wheel.yaml");
    let found: serde_json::Value = serde_json::from_str(&run(&["check", "--json", example])).unwrap();
    let moduli = |state: usize| -> Vec<f64> {
        let all = found["duty"][state]["youngs_moduli_gpa"].as_array().unwrap();
        all.iter().map(|modulus| modulus.as_f64().unwrap()).collect()
    };
    assert_eq!(moduli(0), [210.0, 73.0]);
    assert!(moduli(1)[0] < 206.0 && (68.0..71.0).contains(&moduli(1)[1]), "{:?}", moduli(1));
    assert!(moduli(2)[0] > 210.0 && moduli(2)[1] > 73.0, "{:?}", moduli(2));
    assert_eq!(found["materials"][1]["youngs_modulus_gpa"], 73.0);
    assert_eq!(found["materials"][1]["youngs_modulus_curve"], "tension tests, invented for this example");

    let folder = tempfile::tempdir().unwrap();
    let page = folder.path().join("wheel.html");
    run(&["report", example, "-o", page.to_str().unwrap()]);
    let page = std::fs::read_to_string(page).unwrap();
    assert!(page.contains("Young’s modulus at temperature"));
    assert!(page.contains("tension tests, invented for this example"));
    assert!(page.contains("over that at 20 °C"));
    assert!(page.contains("elastic law at the current temperature"));

    let sheet = run(&["materials", "S355J2"]);
    assert!(sheet.contains("youngs_modulus_curve                 -200 degC to 500 degC"), "{sheet}");
    assert!(sheet.contains("at 200 degC                        199 GPa"), "{sheet}");
    assert!(sheet.contains("Table TM-1"), "{sheet}");
    assert!(!run(&["materials", "EN-GJL-250"]).contains("youngs_modulus_curve"));
}
