//! Slips of the unit in a joint file: what is told, at its place, and what unit is offered.

mod joint_support;

use hubgrip::diagnostic::Diagnostic;
use joint_support::{FULL, faults, joint, listed, place};

/// A joint with small lengths in every place. Invented demo data.
const SMALL: &str = "\
joint_file: 1
diameter: 60 mm
length: 70 mm
shaft: {material: C45+N, roughness: Rz 4 um}
hub: {material: C45+QT, outer_diameter: 110 mm, roughness: Ra 0.8 um}
fit: {hole: {lower: 0 um, upper: 30 um}, shaft: ±5 um}
assembly: {method: heat hub, clearance: 50 um, form_error: 5 um, handling_allowance: 6 um}
population: {hole: {mean: 60.01 mm, sd: 3 um}, hub_roughness: 6 to 10 um, shaft_roughness: 4 um}
";

const MEASURED: &str = "\
joint_file: 1
diameter: 60 mm
length: 70 mm
shaft: {material: C45+N}
hub: {material: C45+QT, outer_diameter: 110 mm}
fit: {measured: {hole: 60.01 mm, shaft: 60.06 mm, uncertainty: 2 um}}
";

/// The one fault of a text in which `from` is written as `to`, at `value` in it.
fn only(text: &str, from: &str, to: &str, value: &str) -> Diagnostic {
    assert!(text.contains(from), "the text has no `{from}`");
    let changed = text.replacen(from, to, 1);
    let found = faults(&changed);
    assert_eq!(found.len(), 1, "{to}: {}", listed(&found));
    let start = changed.find(to).expect("it was put in") + to.rfind(value).expect("it holds the value");
    let before = &changed[..start];
    let line = before.matches('\n').count() + 1;
    let column = before.rsplit('\n').next().unwrap_or_default().chars().count() + 1;
    assert_eq!(place(&found[0]), Some((line, column, value.chars().count())), "{to}: {}", listed(&found));
    found[0].clone()
}

#[test]
fn a_small_length_without_a_unit_is_not_taken_for_millimetres() {
    joint(SMALL);
    for (text, from, to, value, message) in [
        (SMALL, "Rz 4 um", "Rz 6.3", "Rz 6.3", "6.3 has no unit: write 6.3 um"),
        (SMALL, "Ra 0.8 um", "Ra 0.8", "Ra 0.8", "0.8 has no unit: write 0.8 um"),
        (SMALL, "lower: 0 um", "lower: 0", "0", "0 has no unit: write 0 um"),
        (SMALL, "upper: 30 um", "upper: 30", "30", "30 has no unit: write 30 um"),
        (SMALL, "±5 um", "±5", "±5", "5 has no unit: write 5 um"),
        (SMALL, "clearance: 50 um", "clearance: 50", "50", "50 has no unit: write 50 um"),
        (SMALL, "form_error: 5 um", "form_error: 5", "5", "5 has no unit: write 5 um"),
        (SMALL, "allowance: 6 um", "allowance: 6", "6", "6 has no unit: write 6 um"),
        (SMALL, "sd: 3 um", "sd: 3", "3", "3 has no unit: write 3 um"),
        (SMALL, "mean: 60.01 mm", "mean: 60.01", "60.01", "60.01 has no unit: write 60.01 mm"),
        (SMALL, "6 to 10 um", "6 to 10", "6 to 10", "6 has no unit: write 6 um"),
        (SMALL, "length: 70 mm", "length: 70", "70", "70 has no unit: write 70 mm"),
        (MEASURED, "2 um", "2", "2", "2 has no unit: write 2 um"),
        (MEASURED, "hole: 60.01 mm", "hole: 60.01", "60.01", "60.01 has no unit: write 60.01 mm"),
    ] {
        let fault = only(text, from, to, value);
        assert_eq!(fault.message, message, "{to}");
        assert!(fault.help.as_ref().is_some_and(|help| help.contains("mm, um, in")), "{to}");
    }
    let own = MEASURED.replace("60.01 mm", "60.01 mm ± 2").replace(", uncertainty: 2 um", "");
    assert_eq!(faults(&own)[0].message, "2 has no unit: write 2 um");
}

#[test]
fn a_roughness_that_no_seat_has_is_refused() {
    let too_rough = "is above 0.5 mm: no machined seat is so rough";
    for (from, to) in [("Rz 4 um", "Rz 6.3 mm"), ("Ra 0.8 um", "Ra 0.501 mm"), ("Rz 4 um", "Rz 250 thou")] {
        let found = faults(&SMALL.replace(from, to));
        assert_eq!(found.len(), 1, "{}", listed(&found));
        assert_eq!(found[0].message, format!("the roughness {to} {too_rough}"));
        assert!(
            found[0].help.as_ref().is_some_and(|help| help.contains("is um meant")),
            "{}",
            listed(&found)
        );
        assert!(place(&found[0]).is_some());
    }
    joint(&SMALL.replace("Rz 4 um", "Rz 0.5 mm"));
    let told = "which no machined seat has; is um meant?";
    for (from, to) in [("sd: 3 um", "sd: 3 mm"), ("6 to 10 um", "6 to 10 mm"), ("ness: 4 um", "ness: 4 mm")] {
        let found = faults(&SMALL.replace(from, to));
        assert_eq!(found.len(), 1, "{to}: {}", listed(&found));
        assert!(found[0].message.contains(told), "{to}: {}", listed(&found));
    }
}

/// 0.5 % of 60.01 mm is 300.05 um.
#[test]
fn an_uncertainty_that_would_cover_any_fit_is_refused() {
    joint(&MEASURED.replace("2 um", "300 um"));
    let fault = only(MEASURED, "2 um", "301 um", "301 um");
    let told =
        "the uncertainty 301 um is 0.50 % of the diameter 60.01 mm: no measurement of a seat is so coarse";
    assert_eq!(fault.message, told);
    assert_eq!(fault.help.as_deref(), Some("is um meant, as in `uncertainty: 2 um`?"));
    let own = MEASURED.replace("60.06 mm", "60.06 mm ± 2 mm").replace(", uncertainty: 2 um", "");
    let found = faults(&own);
    assert_eq!(place(&found[0]).map(|(line, _, width)| (line, width)), Some((6, 15)), "{}", listed(&found));
    assert!(found[0].message.starts_with("the uncertainty 2 mm is 3.33 %"), "{}", listed(&found));
}

#[test]
fn the_usual_file_is_still_read() {
    joint(FULL);
}

/// A steel shaft, a carbide core and a polymer bush written in place. Invented demo data.
const IN_PLACE: &str = "\
joint_file: 1
diameter: 60 mm
length: 70 mm
shaft:
  material: {kind: ductile, youngs_modulus: 200 GPa, poisson: 0.30, density: 7850 kg/m3, expansion: 11.5e-6 /K, yield_strength: 355 MPa, tensile_strength: 600 MPa}
hub:
  material:
    kind: ductile
    youngs_modulus: 205 GPa
    poisson: 0.29
    density: {value: 7.8 g/cm3, source: demo}
    expansion: 11.5e-6 /K
    strength: [{section_up_to: 40 mm, yield_strength: 400 MPa, tensile_strength: 650 MPa}]
  outer_diameter: 110 mm
fit: H7/s6
";

#[test]
fn a_material_that_cannot_be_is_told_at_its_value() {
    joint(IN_PLACE);
    for (from, to, value, message, help) in [
        (
            "200 GPa",
            "200 MPa",
            "200 MPa",
            "youngs_modulus 200 MPa is outside 10 GPa to 1200 GPa, which hold all metals and ceramics",
            "steel has 210 GPa",
        ),
        (
            "200 GPa",
            "200000 GPa",
            "200000 GPa",
            "youngs_modulus 200000 GPa is outside 10 GPa to 1200 GPa, which hold all metals and ceramics",
            "steel has 210 GPa",
        ),
        (
            "7850 kg/m3",
            "7.85 kg/m3",
            "7.85 kg/m3",
            "density 7.85 kg/m3 is outside 100 kg/m3 to 25000 kg/m3, which hold all materials",
            "7.85 g/cm3",
        ),
        (
            "yield_strength: 355 MPa, tensile_strength: 600 MPa",
            "yield_strength: 355 GPa",
            "355 GPa",
            "yield_strength 355 GPa is above a tenth of Young's modulus 200 GPa, the strength of an ideal crystal",
            "200 to 2000 MPa",
        ),
        (
            "tensile_strength: 600 MPa",
            "tensile_strength: 20.1 GPa",
            "20.1 GPa",
            "tensile_strength 20.1 GPa is above a tenth of Young's modulus 200 GPa, the strength of an ideal crystal",
            "200 to 2000 MPa",
        ),
        (
            "400 MPa, tensile_strength: 650 MPa",
            "400 MPa, tensile_strength: 650 GPa",
            "650 GPa",
            "tensile_strength 650 GPa is above a tenth of Young's modulus 205 GPa, the strength of an ideal crystal",
            "200 to 2000 MPa",
        ),
        ("200 GPa", "200", "200", "200 has no unit: write 200 GPa", "MPa, GPa"),
    ] {
        let fault = only(IN_PLACE, from, to, value);
        assert_eq!(fault.message, message, "{to}");
        assert!(fault.help.as_ref().is_some_and(|told| told.contains(help)), "{to}: {:?}", fault.help);
    }
    // A material's source stands beside its value: the place is that of the whole.
    let found = faults(&IN_PLACE.replace("7.8 g/cm3", "7.8 kg/m3"));
    assert_eq!(
        (found.len(), found[0].message.starts_with("density 7.8 kg/m3")),
        (1, true),
        "{}",
        listed(&found)
    );
    let polymer = IN_PLACE.replacen("kind: ductile", "kind: polymer", 1);
    joint(&polymer.replace("200 GPa", "3 GPa").replace("7850", "1150"));
    for outside in ["151 GPa", "0.9 MPa"] {
        let found = faults(&polymer.replace("200 GPa", outside));
        assert!(
            found[0].message.contains("is outside 1 MPa to 150 GPa, which hold all polymers"),
            "{}",
            listed(&found)
        );
    }
}
