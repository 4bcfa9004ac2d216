//! Oil injection: what floats the hub, what the parts carry meanwhile, and where it is told.

mod common;

use approx::assert_relative_eq;
use common::{findings_of, hubgrip_in, stdout};
use hubgrip::findings::{Findings, worksheet};
use serde_json::Value;

const STEEL: &str = "{name: steel, kind: ductile, youngs_modulus: 200 GPa, poisson: 0.3, density: 7800 kg/m3, \
                     expansion: 12e-6 /K, yield_strength: 350 MPa, tensile_strength: 600 MPa, source: invented}";

/// Two steel rings of d 50 mm in D 100 mm, solid shaft, U 20 µm to 50 µm without loss; invented demo data.
fn plain() -> String {
    format!(
        "joint_file: 1\ndiameter: 50 mm\nlength: 40 mm\nshaft: {{material: {STEEL}}}\n\
         hub: {{material: {STEEL}, outer_diameter: 100 mm}}\n\
         fit: {{hole: {{lower: 0 um, upper: 10 um}}, shaft: {{lower: 30 um, upper: 50 um}}}}\nfriction: 0.12\nsmoothing: none\n"
    )
}

fn said(findings: &Findings, words: &str) -> bool {
    findings.cautions.iter().any(|caution| caution.subject == "apart" && caution.text.contains(words))
}

/// By hand (Lamé, Q = 1/2): U 50 µm gives p 75 MPa and σv 175 MPa at the bore, so that 350 MPa leave S = 2; 90 MPa of oil
/// leave 2/1.2 and part the seats by a fifth of 50 µm. The solid shaft, −90 MPa everywhere, has 350/90 left.
#[test]
fn a_plain_joint_by_hand() {
    let found = findings_of(&plain());
    let oil = found.assembly.oil.unwrap();
    let (loose, tight) = (oil.loosest.unwrap(), oil.tightest);
    assert_relative_eq!(tight.least, 75e6, max_relative = 1e-12);
    assert_relative_eq!(loose.least, 30e6, max_relative = 1e-12);
    assert_relative_eq!(tight.planned, 90e6, max_relative = 1e-12);
    assert_relative_eq!(tight.usual.low, 82.5e6, max_relative = 1e-12);
    assert_relative_eq!(tight.usual.high, 112.5e6, max_relative = 1e-12);
    assert_relative_eq!(tight.film, 10e-6, max_relative = 1e-9);
    assert_relative_eq!(loose.film, 4e-6, max_relative = 1e-9);
    assert_relative_eq!(tight.hub_safety.unwrap(), 2.0 / 1.2, max_relative = 1e-9);
    assert_relative_eq!(tight.hub_limit.unwrap(), 150e6, max_relative = 1e-9);
    assert_relative_eq!(tight.shaft_safety.unwrap(), 350.0 / 90.0, max_relative = 1e-9);
    assert_relative_eq!(tight.shaft_limit.unwrap(), 350e6, max_relative = 1e-9);
    assert_relative_eq!(tight.limit().unwrap(), 150e6, max_relative = 1e-9);
    assert!(said(&found, "jump off") && said(&found, "drain") && !said(&found, "less than the"));
    let weak = findings_of(&plain().replace("yield_strength: 350", "yield_strength: 240"));
    assert!(said(&weak, "leaves the hub a safety of 1.14 only, less than the 1.20"), "{:?}", weak.cautions);
}

/// At the limit the equivalent stress of the hub is its strength: the oil in the stack of rings as its own pressure.
#[test]
fn several_rings_follow_the_stress_of_all_joints() {
    let fit = "{hole: {lower: 0 um, upper: 0 um}, shaft: {lower: 30 um, upper: 30 um}}";
    let text = format!(
        "joint_file: 1\nlength: 40 mm\nrings:\n  - {{name: core, material: {STEEL}, bore: 20 mm, outer_diameter: 40 mm}}\n  \
         - {{name: middle, material: {STEEL}, outer_diameter: 60 mm}}\n  - {{name: outer, material: {STEEL}, \
         outer_diameter: 100 mm}}\nfits:\n  - {fit}\n  - {fit}\nfriction: 0.1\nsmoothing: none\n"
    );
    let found = findings_of(&text);
    let oil = found.assembly.oil.unwrap().tightest;
    assert_relative_eq!(oil.least, found.extremes.tightest.pressure, max_relative = 1e-12);
    // The outer ring sees nothing but the oil: σv = p √(3 + Q⁴)/(1 − Q²), Q = 0.6 (Lamé, von Mises).
    let equivalent = |oil: f64| oil * (3.0f64 + 0.6f64.powi(4)).sqrt() / (1.0 - 0.36);
    assert_relative_eq!(oil.hub_safety.unwrap(), 350e6 / equivalent(oil.planned), max_relative = 1e-9);
    assert_relative_eq!(equivalent(oil.hub_limit.unwrap()), 350e6, max_relative = 1e-7);
    // The middle ring is pressed by the joint within as well; its own limit is not in proportion.
    assert!((oil.shaft_limit.unwrap() / (oil.shaft_safety.unwrap() * oil.planned) - 1.0).abs() > 1e-3);
    assert!(oil.film > 0.0 && oil.film < 0.2 * found.extremes.tightest.shop_interference * 1.001);
}

/// One oil pressure lifts the slice that presses hardest and loads the weakest: both worked alone as plain joints.
#[test]
fn a_stepped_hub_is_lifted_where_it_presses_hardest() {
    let slice = |outer: u32| {
        findings_of(&plain().replace("outer_diameter: 100 mm", &format!("outer_diameter: {outer} mm")))
    };
    let stepped = plain().replace(
        "outer_diameter: 100 mm",
        "steps: [{length: 15 mm, outer_diameter: 70 mm}, {length: 25 mm, outer_diameter: 100 mm}]",
    );
    let oil = findings_of(&stepped).assembly.oil.unwrap().tightest;
    let (thin, thick) = (slice(70).assembly.oil.unwrap().tightest, slice(100).assembly.oil.unwrap().tightest);
    assert!(thin.least < thick.least && thin.hub_limit < thick.hub_limit);
    assert_relative_eq!(oil.least, thick.least, max_relative = 1e-9);
    assert_relative_eq!(oil.hub_limit.unwrap(), thin.hub_limit.unwrap(), max_relative = 1e-9);
    assert_relative_eq!(
        oil.hub_safety.unwrap(),
        thin.hub_limit.unwrap() / (1.2 * thick.least),
        max_relative = 1e-9
    );
}

#[test]
fn a_hub_that_has_yielded_yields_further_under_more_than_its_contact_pressure() {
    let text = plain().replace("upper: 50 um", "upper: 140 um").replace("lower: 30 um", "lower: 130 um")
        + "require: {allow: plastic}\n";
    let text = text.replacen("yield_strength: 350", "yield_strength: 590", 1);
    let found = findings_of(&text);
    assert!(found.service.plastic.as_ref().unwrap().worn.as_ref().unwrap().tightest > 0.0);
    let oil = found.assembly.oil.unwrap().tightest;
    assert_relative_eq!(oil.hub_limit.unwrap(), found.extremes.tightest.pressure, max_relative = 1e-12);
    assert_relative_eq!(oil.hub_safety.unwrap(), 1.0 / 1.2, max_relative = 1e-12);
    let (_, drifts) = worksheet::worked(&found);
    assert!(drifts.is_empty(), "{drifts:#?}");
}

#[test]
fn a_pair_that_does_not_grip_needs_no_oil() {
    let loose = findings_of(&plain().replace("lower: 30 um, upper: 50 um", "lower: 5 um, upper: 50 um"));
    let oil = loose.assembly.oil.unwrap();
    assert!(oil.loosest.is_none() && oil.tightest.least > 0.0);
    let open = findings_of(&plain().replace("lower: 30 um, upper: 50 um", "lower: -40 um, upper: -20 um"));
    assert!(open.assembly.oil.is_none() && !said(&open, "oil"));
}

#[test]
fn terminal_json_worksheet_and_report_tell_it() {
    let here = tempfile::tempdir().unwrap();
    std::fs::write(here.path().join("oil.yaml"), plain()).unwrap();
    let text = stdout(&hubgrip_in(here.path(), &["check", "oil.yaml"])).replace("\n  ", " ");
    assert!(
        text.contains(
            "30 MPa at the loosest and 75 MPa at the tightest pair. Plan 36 MPa and 90 MPa, 1.2 times"
        ),
        "{text}"
    );
    assert!(text.contains("part by 10 µm on the diameter, which leaves a safety of 1.66 to the hub and a safety of 3.88 to the shaft."), "{text}");
    assert!(text.contains("More than 150 MPa of oil overstrains the hub."), "{text}");
    let json = stdout(&hubgrip_in(here.path(), &["check", "--json", "oil.yaml"]));
    let json: Value = serde_json::from_str(&json).unwrap();
    let oil = &json["assembly"]["oil_injection"];
    assert_relative_eq!(oil["tightest"]["planned_mpa"].as_f64().unwrap(), 90.0, max_relative = 1e-9);
    assert_relative_eq!(oil["loosest"]["least_mpa"].as_f64().unwrap(), 30.0, max_relative = 1e-9);
    assert_relative_eq!(oil["tightest"]["film_um"].as_f64().unwrap(), 10.0, max_relative = 1e-9);
    assert_relative_eq!(oil["tightest"]["hub_limit_mpa"].as_f64().unwrap(), 150.0, max_relative = 1e-9);
    let work = &json["assembly"]["press_work"];
    assert_relative_eq!(work["oil_pressure_mpa"].as_f64().unwrap(), 90.0, max_relative = 1e-9);
    let found = findings_of(&plain());
    let (sections, drifts) = worksheet::worked(&found);
    assert!(drifts.is_empty(), "{drifts:#?}");
    // To the six digits of a sheet that is worked from printed values.
    for (symbol, by_hand) in
        [("p_omin", 36.0), ("p_omax", 90.0), ("delta_o", 10.0), ("p_oh", 150.0), ("p_os", 350.0)]
    {
        let mut lines = sections.iter().flat_map(|section| &section.lines);
        let line = lines.find(|line| line.symbol.plain() == symbol).unwrap();
        assert_relative_eq!(line.printed.parse::<f64>().unwrap(), by_hand, max_relative = 5e-6);
    }
    let page = hubgrip::report::html::html(&found);
    let step = page.split("To take it apart").nth(1).unwrap().split("</li>").collect::<String>();
    assert!(step.contains("floats the hub above their contact pressure") && step.contains("it may jump off"));
}
