//! The worksheet cannot drift from the code.
//!
//! Every printed formula is parsed and worked by an independent expression evaluator (the crate exmex)
//! from the printed values of its symbols; the result, printed to the same digits, must equal the printed
//! result to its last digit. The sheet itself compares each result with the program's own figure.

mod common;

use std::collections::BTreeMap;

use exmex::prelude::*;
use hubgrip::findings::{Findings, WorksheetLine, worksheet};
use hubgrip::joint::Method;
use hubgrip::quantity::{UnitSystem, number};

/// Digits to which a worksheet prints.
const DIGITS: usize = 6;

/// Works every formula of a sheet from its printed values; their number.
fn work(findings: &Findings, name: &str) -> usize {
    let mut formulas = 0;
    let mut printed: BTreeMap<String, f64> = BTreeMap::from([("pi".to_owned(), std::f64::consts::PI)]);
    for line in findings.worksheet().iter().flat_map(|section| &section.lines) {
        if let Some(formula) = &line.formula {
            let text = formula.plain();
            let parsed = exmex::parse::<f64>(&text).unwrap_or_else(|error| panic!("{name}: {text}: {error}"));
            let values: Vec<f64> = parsed
                .var_names()
                .iter()
                .map(|symbol| {
                    *printed.get(symbol).unwrap_or_else(|| panic!("{text}: {symbol} has no printed value"))
                })
                .collect();
            let worked = parsed.eval(&values).expect("the formula can be worked");
            assert_eq!(number(worked, DIGITS), line.printed, "{name}: {} = {text}", line.symbol.plain());
            formulas += 1;
        }
        printed.insert(line.symbol.plain(), line.printed.parse().expect("a printed value is a number"));
    }
    formulas
}

#[test]
fn every_formula_of_every_example_gives_its_printed_result() {
    let formulas: usize = common::examples()
        .iter()
        .map(|path| work(&common::findings(path), &path.display().to_string()))
        .sum();
    assert!(formulas > 150, "only {formulas} formulas were worked");
    println!("{formulas} formulas worked");
}

/// A printed line of a sheet.
fn line(findings: &Findings, symbol: &str) -> WorksheetLine {
    let lines = findings.worksheet().into_iter().flat_map(|section| section.lines);
    let mut found = lines.filter(|line| line.symbol.plain() == symbol);
    found.next().unwrap_or_else(|| panic!("no line {symbol}"))
}

/// Inner and outer rings, ball and roller, metric and inch, raceways estimated and given, at speed, relaxed, chilled and
/// heated at once, in a housing that yields.
#[test]
fn every_line_of_a_bearing_seat_agrees() {
    let on_shaft = "joint_file: 1\nshaft: {material: C45+QT, bore: 20 mm, roughness: Rz 2.5 um}\n\
                    hub: {bearing: {bore: 50 mm, outside_diameter: 90 mm, width: 20 mm}}\nfit: m6\n";
    let in_housing = "joint_file: 1\n\
                      shaft: {bearing: {bore: 50 mm, outside_diameter: 90 mm, width: 20 mm, type: roller, clearance: C3}}\n\
                      hub: {material: EN-AW-6082-T6, outer_diameter: 130 mm, roughness: Rz 4 um}\nfit: P7\n";
    let soft = "{name: soft, kind: ductile, youngs_modulus: 70 GPa, poisson: 0.33, density: 2700 kg/m3, \
                expansion: 23e-6 /K, yield_strength: 25 MPa, tensile_strength: 120 MPa, source: invented}";
    let cases = [
        format!(
            "{on_shaft}duty: [{{state: rest}}, {{state: fast, speed: 6000 rpm, shaft_temperature: 75 degC, hub_temperature: \
             70 degC}}]\nassembly: {{method: heat and chill, bath: dry ice, clearance: 20 um}}\n"
        ),
        format!(
            "{}display: inch\nduty: [{{state: relaxed, torque: 5 N.m, relaxation: 0.8, temperature: 60 degC}}]\n",
            on_shaft.replace("width: 20 mm", "width: 20 mm, inner_raceway: 58.4 mm, outer_raceway: 81.6 mm")
        ),
        format!(
            "{in_housing}duty: [{{state: cold, temperature: -15 degC}}, {{state: warm, temperature: 60 degC}}]\n"
        ),
        format!(
            "{in_housing}display: inch\nduty: [{{state: turning, torque: 2 N.m}}]\nassembly: {{method: chill shaft}}\n"
        ),
        format!(
            "{}require: {{allow: plastic}}\nduty: [{{state: cold, temperature: -10 degC}}]\n",
            in_housing
                .replace("EN-AW-6082-T6", soft)
                .replace("fit: P7", "fit: S7")
                .replace("shaft: {", "shaft: {material: 42CrMo4+QT, ")
        ),
    ];
    for case in cases {
        let findings = common::findings_of(&case);
        let (_, drifts) = worksheet::worked(&findings);
        assert!(drifts.is_empty(), "{case}: {drifts:#?}");
        assert!(work(&findings, &case) > 30);
        assert_eq!(
            findings
                .worksheet()
                .iter()
                .any(|section| section.lines.iter().any(|line| line.symbol.plain() == "G_max")),
            case.contains("plastic")
        );
        // The lines carry the figures that terminal, JSON and report show, to a unit of the printed digits.
        let bearing = findings.bearing.as_ref().unwrap();
        let inch = findings.joint.display == UnitSystem::Inch;
        let (small, newton, pascal) = if inch {
            (1e3 / 0.0254, 1.0 / 4.448_221_615_260_5, 1.0 / 6_894.757_293_168)
        } else {
            (1e6, 1.0, 1e-6)
        };
        let scale = bearing.before.value.high * small;
        for (symbol, program, scale) in [
            ("Delta_min", bearing.loss.loosest * small, 0.0),
            ("Delta_max", bearing.loss.tightest * small, 0.0),
            ("a_min", bearing.mounted.low * small, scale),
            ("a_max", bearing.mounted.high * small, scale),
            ("Delta_max1", bearing.states[0].loss.high * small, 0.0),
            ("a_min1", bearing.states[0].left.low * small, scale),
            ("a_max1", bearing.states[0].left.high * small, scale),
            ("sigma_Bmax", bearing.hoop_stress.tightest * pascal, 0.0),
            ("F_on", bearing.mounting_force * newton, 0.0),
            ("F_off", bearing.pull_off_force * newton, 0.0),
        ] {
            let printed: f64 = line(&findings, symbol).printed.parse().unwrap();
            let allowed = 5e-5 * f64::max(program.abs(), scale);
            assert!((printed - program).abs() <= allowed, "{case}: {symbol} {printed}, {program}");
        }
        let hot = bearing.mounting_temperature.unwrap() - 273.15;
        let hot = if inch { hot * 1.8 + 32.0 } else { hot };
        let symbol = if findings.joint.assembly.method == Method::HeatHub { "T_h" } else { "T_hB" };
        let printed: f64 = line(&findings, symbol).printed.parse().unwrap();
        assert!((printed - hot).abs() <= 5e-5 * hot.abs(), "{case}: {printed}, {hot}");
    }
}

/// What no example has: pressures from outside, relaxation, a hub strained further at work, a brittle bush.
#[test]
fn every_line_agrees_in_rarer_cases() {
    let head = "joint_file: 1\ndiameter: 50 mm\nlength: 40 mm\n";
    let cases = [
        "shaft: {material: 42CrMo4+QT, bore: 20 mm}\nhub: {material: C45+N, outer_diameter: 90 mm}\nfit: H7/s6\nduty:\n  \
         - {state: one, torque: 100 N.m, inner_pressure: 40 MPa, relaxation: 0.6}\n  - {state: two, axial_force: 1 kN, \
         outer_pressure: 15 MPa, speed: 3000 rpm}\n",
        "shaft: {material: 42CrMo4+QT}\nhub: {material: C45+N, outer_diameter: 90 mm}\nfit: {hole: {lower: 0 um, upper: 10 um}, \
         shaft: {lower: 120 um, upper: 130 um}}\nrequire: {allow: plastic}\nduty: [{state: cold, torque: 10 N.m, \
         hub_temperature: 0 degC}, {state: hot, torque: 10 N.m, hub_temperature: 50 degC, relaxation: 0.9}]\n",
        "shaft: {name: bush, material: EN-GJL-250, bore: 36 mm}\nhub: {material: C45+N, outer_diameter: 90 mm}\nfit: H7/s6\n",
        "shaft: {material: 42CrMo4+QT, bore: 20 mm}\nhub: {material: C45+N, outer_diameter: 90 mm}\nfit: H7/s6\nduty:\n  \
         - {state: one, torque: 100 N.m, bending_moment: 90 N.m, rotating_bending: yes}\n  - {state: two, radial_force: 1 kN, \
         bending_moment: 30 N.m, rotating_bending: yes}\n  - {state: three, radial_force: 2 kN}\ndisplay: inch\n",
        "shaft: {material: {kind: ductile, youngs_modulus: 210 GPa, poisson: 0.3, density: 7850 kg/m3, expansion: 12e-6 /K, \
         yield_strength: 1100 MPa, tensile_strength: 1300 MPa}, roughness: Rz 0.5 um}\nhub: {material: C45+N, outer_diameter: 90 \
         mm}\nfit: H7/s6\nduty: [{state: one, bending_moment: 90 N.m, rotating_bending: yes}]\n",
        "shaft: {material: 42CrMo4+QT, bore: 20 mm}\nhub: {material: EN-AW-6082-T6, outer_diameter: 90 mm}\nfit: H7/x7\n\
         assembly: {shop_temperature: 35 degC}\nduty:\n  - {state: hot, torque: 10 N.m, temperature: 90 degC, speed: 3000 rpm, \
         inner_pressure: 20 MPa, outer_pressure: 5 MPa}\n  - {state: gradient, torque: 10 N.m, inner_temperature: 90 degC, \
         outer_temperature: 40 degC, speed: 2000 rpm}\n  - {state: shop, torque: 10 N.m}\n  - {state: reference, torque: 10 N.m, \
         temperature: 20 degC}\n",
        "shaft: {material: C45+N}\nhub: {material: C45+N, steps: [{length: 20 mm, outer_diameter: 90 mm}, {length: 20 mm, \
         outer_diameter: 110 mm}]}\nfit: H7/s6\nassembly: {shop_temperature: 30 degC}\n",
    ];
    for case in cases {
        let findings = common::findings_of(&format!("{head}{case}"));
        let (_, drifts) = worksheet::worked(&findings);
        assert!(drifts.is_empty(), "{case}: {drifts:#?}");
    }
}

/// Several rings at speed, with a solid core, a drilled one, pressure inside, a brittle ring, Tresca, a gradient: the
/// stress that governs each ring is worked, and the grip of each interface in each loaded state.
#[test]
fn every_ring_of_several_is_worked() {
    let rings = |core: &str| {
        format!(
            "joint_file: 1\nlength: 40 mm\nrings:\n  - {{name: core, material: 42CrMo4+QT{core}, outer_diameter: 40 mm}}\n  \
             - {{name: middle, material: EN-GJL-250, outer_diameter: 60 mm}}\n  - {{name: outside, material: C45+N, \
             outer_diameter: 90 mm}}\nfits: [H7/s6, H7/s6]\n"
        )
    };
    for (core, rest) in [
        ("", "duty: [{state: fast, torque: 50 N.m, axial_force: 1 kN, speed: 9000 rpm}]\n"),
        (
            ", bore: 12 mm",
            "duty: [{state: stroke, torque: 20 N.m, inner_pressure: 60 MPa}]\ncriterion: Tresca\n",
        ),
        (", bore: 12 mm", "duty: [{state: fast, torque: 20 N.m, speed: 12000 rpm}]\ndisplay: inch\n"),
        (
            ", bore: 12 mm",
            "duty: [{state: hot, torque: 20 N.m, inner_temperature: 90 degC, outer_temperature: 30 degC}]\n",
        ),
    ] {
        let case = format!("{}{rest}", rings(core));
        let findings = common::findings_of(&case);
        let (sections, drifts) = worksheet::worked(&findings);
        assert!(drifts.is_empty(), "{case}: {drifts:#?}");
        assert!(work(&findings, &case) > 10);
        let lines = || sections.iter().flat_map(|section| &section.lines);
        let printed = |symbol: &str| {
            let line = lines().find(|line| line.symbol.plain() == symbol);
            line.unwrap_or_else(|| panic!("{case}: {symbol} is missing")).printed.parse::<f64>().unwrap()
        };
        let slip = findings.duty[0].loosest.slip_safety.unwrap();
        let least = printed("S_1s1").min(printed("S_2s1"));
        assert!((least / slip - 1.0).abs() < 5e-5, "{case}: {least} and {slip}");
        for (number, governing) in findings.service.governing.iter().enumerate() {
            let safety = governing.safety.unwrap();
            assert!((printed(&format!("S_{}", number + 1)) / safety - 1.0).abs() < 5e-5, "{case}");
        }
    }
}

/// Where a state governs the strength of two parts, it is that state whose stress is worked: at speed, with pressures, with a
/// gradient, brittle, by Tresca, relaxed, in inches.
#[test]
fn the_state_that_governs_the_strength_is_worked() {
    let head = "joint_file: 1\ndiameter: 50 mm\nlength: 40 mm\nfit: H7/s6\n";
    let steel =
        "shaft: {material: 42CrMo4+QT, bore: 20 mm}\nhub: {material: C45+N, outer_diameter: 110 mm}\n";
    let iron = "shaft: {material: C45+N}\nhub: {material: EN-GJL-250, outer_diameter: 110 mm}\n";
    let liner =
        "shaft: {material: EN-GJL-250, bore: 30 mm}\nhub: {material: C45+N, outer_diameter: 110 mm}\n";
    for (parts, rest, symbols) in [
        (steel, "duty: [{state: fast, torque: 20 N.m, speed: 9000 rpm}]\n", &["S_h1"][..]),
        (
            steel,
            "duty: [{state: rest}, {state: pressed, inner_pressure: 60 MPa, outer_pressure: 20 MPa}]\n",
            &["S_h2"],
        ),
        (
            steel,
            "criterion: Tresca\nduty: [{state: cold, torque: 5 N.m, hub_temperature: 0 degC, relaxation: 0.8}]\n",
            &["S_h1", "S_s1"],
        ),
        (iron, "duty: [{state: fast, torque: 5 N.m, speed: 6000 rpm}]\ndisplay: inch\n", &["S_h1"]),
        (
            liner,
            "duty: [{state: cold, torque: 5 N.m, hub_temperature: 0 degC, speed: 3000 rpm}]\n",
            &["S_s1", "S_h1"],
        ),
        (
            steel,
            "duty: [{state: hot, torque: 5 N.m, inner_temperature: 90 degC, outer_temperature: 40 degC}]\n",
            &["S_h1"],
        ),
    ] {
        let case = format!("{head}{parts}{rest}");
        let findings = common::findings_of(&case);
        let (_, drifts) = worksheet::worked(&findings);
        assert!(drifts.is_empty(), "{case}: {drifts:#?}");
        assert!(work(&findings, &case) > 20);
        for symbol in symbols {
            let part = if symbol.starts_with("S_h") { "hub safety" } else { "shaft safety" };
            let verdict = findings.verdicts.iter().find(|verdict| verdict.subject.starts_with(part)).unwrap();
            let printed: f64 = line(&findings, symbol).printed.parse().unwrap();
            assert!((printed / verdict.found.unwrap() - 1.0).abs() < 1e-4, "{case}: {symbol}");
        }
    }
}

/// Bending of more than two rings and of a stepped hub, whose sheets have no state symbols of their own.
#[test]
fn bending_is_worked_for_every_kind_of_joint() {
    let bent = "duty: [{state: bent, torque: 50 N.m, bending_moment: 90 N.m, rotating_bending: yes}]\n";
    let cases = [
        "joint_file: 1\nlength: 40 mm\nrings:\n  - {material: C45+N, outer_diameter: 40 mm}\n  - {material: C45+N, \
         outer_diameter: 60 mm}\n  - {material: C45+N, outer_diameter: 90 mm}\nfits: [H7/s6, H7/s6]\n",
        "joint_file: 1\ndiameter: 50 mm\nlength: 40 mm\nshaft: {material: C45+N}\nhub: {material: C45+N, steps: [{length: 20 mm, \
         outer_diameter: 75 mm}, {length: 20 mm, outer_diameter: 100 mm}]}\nfit: H7/s6\n",
    ];
    for case in cases {
        let findings = common::findings_of(&format!("{case}{bent}"));
        let (sections, drifts) = worksheet::worked(&findings);
        assert!(drifts.is_empty(), "{case}: {drifts:#?}");
        let lines = || sections.iter().flat_map(|section| &section.lines);
        assert!(work(&findings, case) > 10);
        for symbol in ["Deltap_1", "p_l1", "M_g1", "S_fl1", "S_1s1"] {
            assert!(lines().any(|line| line.symbol.plain() == symbol), "{case}: {symbol} is missing");
        }
    }
}

#[test]
fn every_line_agrees_with_the_programs_own_figure() {
    for path in common::examples() {
        let (_, drifts) = worksheet::worked(&common::findings(&path));
        assert!(drifts.is_empty(), "{}: {drifts:#?}", path.display());
    }
}
