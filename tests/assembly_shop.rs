//! Pressing in a shop that is not at 20 °C: the interference that acts there counts.

mod common;

use std::f64::consts::PI;

use approx::assert_relative_eq;
use common::{findings_of, hubgrip_in, stdout};
use hubgrip::findings::{PairFindings, compute, worksheet};
use hubgrip::joint::read;
use hubgrip::material::library::Library;
use hubgrip::population::kernel::{PairKind, PlainJoint};
use hubgrip::population::scatter::Quantity;
use hubgrip::population::scatter::analysis::Analysis;
use hubgrip::population::scatter::understood::understood;

/// An aluminium hub on a steel shaft; invented demo data.
fn joint(shop: &str, fit: &str) -> String {
    format!(
        "joint_file: 1\ndiameter: 60 mm\nlength: 50 mm\nshaft: {{material: C45+N, roughness: Rz 4 um}}\n\
         hub: {{material: EN-AW-6082-T6, outer_diameter: 120 mm, roughness: Rz 6.3 um}}\nfit: {fit}\n\
         friction: {{holding: 0.1, pressing: 0.08 to 0.15}}\nassembly: {{shop_temperature: {shop}}}\n"
    )
}

/// Force by discs of the chamfered shaft: the pressure of a disc follows its own overlap (equilibrium, Lamé).
fn peak_by_discs(pressure: f64, overlap: f64, friction: f64) -> f64 {
    let (diameter, length, slope) = (0.06, 0.05, 5f64.to_radians().tan());
    let chamfer = overlap / (2.0 * slope);
    let wedge = (friction + slope) / (1.0 - friction * slope);
    let force = |travel: f64| {
        let front = (travel - length).max(0.0);
        let (discs, end) = (2_000, chamfer.min(travel));
        let width = (end - front).max(0.0) / f64::from(discs);
        let chamfered: f64 =
            (0..discs).map(|disc| wedge * (front + (f64::from(disc) + 0.5) * width) / chamfer).sum();
        PI * diameter * pressure * (chamfered * width + friction * (travel - end))
    };
    let leaving = |step: i32| force(length + chamfer * f64::from(step) / 200.0);
    (0..=200).map(leaving).fold(0.0, f64::max)
}

/// A pair with clearance at 20 °C that only the cold of the shop closes: p = (U + d (ε_s − ε_h)) / (d (C_h/E_h + C_s/E_s)).
#[test]
fn a_pair_that_only_the_cold_closes_is_pressed_with_the_overlap_it_has_there() {
    for shop in ["-20 degC", "5 degC"] {
        let found = findings_of(&joint(shop, "H7/k6"));
        let (shaft, hub) = found.joint.joined_last();
        let temperature = found.joint.assembly.shop_temperature;
        let growth = 0.06
            * (shaft.material.expansion.strain(temperature).unwrap()
                - hub.material.expansion.strain(temperature).unwrap());
        assert!(growth > 0.0);
        let modulus = |ring: &hubgrip::joint::Ring| ring.material.youngs_modulus_at(temperature).unwrap();
        let flexibility = (5.0 / 3.0 + hub.material.poisson.value) / modulus(hub)
            + (1.0 - shaft.material.poisson.value) / modulus(shaft);
        let check = |pair: &PairFindings, friction: f64, force: f64| {
            let overlap = (pair.effective_interference + growth).max(0.0);
            assert_relative_eq!(pair.shop_interference.max(0.0), overlap, epsilon = 1e-18);
            assert_relative_eq!(pair.pressure, overlap / (0.06 * flexibility), max_relative = 1e-9);
            assert_relative_eq!(force, peak_by_discs(pair.pressure, overlap, friction), max_relative = 1e-5);
        };
        for pair in [&found.extremes.loosest, &found.extremes.mean, &found.extremes.tightest] {
            check(pair, 0.08, pair.press_force.low);
            check(pair, 0.15, pair.press_force.high);
        }
        let press = &found.assembly.press;
        assert_eq!(press.tightest.peak_force, found.extremes.tightest.press_force.high);
        assert_eq!(press.loosest.peak_force, found.extremes.loosest.press_force.low);
        let (_, drifts) = worksheet::worked(&found);
        assert!(drifts.is_empty(), "{drifts:#?}");
    }
    let cold = findings_of(&joint("-20 degC", "H7/k6"));
    assert!(cold.extremes.mean.interference < 0.0 && cold.extremes.mean.press_force.low > 0.0);
}

/// The kernel of the populations has the same force, and two shafts of which only the shop temperature closes one to the
/// other give a force that rises steadily through a clearance of zero.
#[test]
fn the_press_force_rises_steadily_through_no_clearance() {
    let found = findings_of(&joint("-20 degC", "H7/k6"));
    let plain = PlainJoint::of(&found.joint).unwrap();
    let force = |made: f64| plain.pair(made, PairKind::Tightest).unwrap().press_force.high;
    let forces: Vec<f64> = (-400..400).map(|step| force(f64::from(step) * 0.1e-6)).collect();
    assert_eq!(forces[0], 0.0);
    assert!(forces.windows(2).all(|pair| pair[1] >= pair[0]));
    // p and the chamfer both rise with the overlap: the force is a parabola in it, its second difference the same throughout.
    let second: Vec<f64> = forces
        .windows(3)
        .filter(|three| three[0] > 0.0)
        .map(|three| three[2] - 2.0 * three[1] + three[0])
        .collect();
    assert!(second.len() > 400);
    assert!(second.iter().all(|step| (step / second[0] - 1.0).abs() < 1e-5), "{second:?}");
    let full = &found.extremes.tightest;
    assert_relative_eq!(force(full.interference), full.press_force.high, max_relative = 1e-12);
}

/// At 20 °C nothing has changed: the lead-in is U/(2 tan φ).
#[test]
fn at_twenty_degrees_the_interference_that_grips_acts() {
    let found = findings_of(&joint("20 degC", "H7/s6"));
    let pair = &found.extremes.tightest;
    assert_eq!(pair.shop_interference, pair.effective_interference);
    let lead_in = pair.effective_interference / (2.0 * 5f64.to_radians().tan());
    assert_relative_eq!(found.assembly.press.tightest.lead_in, lead_in, max_relative = 1e-12);
}

/// Rings of one steel 10/20/30/50 mm (radii), joined outermost last with a clearance of 10 µm that the joint within
/// closes: the middle ring's rim grows by 4 p b a²/(E (b² − a²)) on the diameter, p the pressure of the first joint alone.
#[test]
fn a_clearance_closed_by_the_joint_within_is_pressed_with_the_growth_it_leaves() {
    let steel = "{name: steel, kind: ductile, youngs_modulus: 200 GPa, poisson: 0.3, density: 7800 kg/m3, \
                 expansion: 12e-6 /K, yield_strength: 350 MPa, tensile_strength: 600 MPa, source: invented}";
    let fit = |upper: i32| {
        format!("{{hole: {{lower: 0 um, upper: 0 um}}, shaft: {{lower: {upper} um, upper: {upper} um}}}}")
    };
    let text = format!(
        "joint_file: 1\nlength: 40 mm\nrings:\n  - {{name: core, material: {steel}, bore: 20 mm, outer_diameter: 40 mm}}\n  \
         - {{name: middle, material: {steel}, outer_diameter: 60 mm}}\n  - {{name: outer, material: {steel}, \
         outer_diameter: 100 mm}}\nfits:\n  - {}\n  - {}\nfriction: 0.1\nsmoothing: none\n",
        fit(20),
        fit(-10)
    );
    let found = findings_of(&text);
    let pair = &found.extremes.tightest;
    // δ = (20, −10) µm gives p = (24.479167, 1.234568) MPa (Lamé's three rings by hand).
    assert_relative_eq!(pair.pressure, 1.234_568e6, max_relative = 1e-6);
    let (a, b) = (20e-3f64, 30e-3f64);
    let alone = 23.437_5e6;
    let growth = 4.0 * alone * b * a * a / (200e9 * (b * b - a * a));
    assert_relative_eq!(pair.shop_interference, growth - 10e-6, max_relative = 1e-6);
    let lead_in = pair.shop_interference / (2.0 * 5f64.to_radians().tan());
    assert_relative_eq!(found.assembly.press.tightest.lead_in, lead_in, max_relative = 1e-12);
}

#[test]
fn the_program_shows_what_acts_in_the_shop() {
    let here = tempfile::tempdir().unwrap();
    std::fs::write(here.path().join("cold.yaml"), joint("-20 degC", "H7/k6")).unwrap();
    let text = stdout(&hubgrip_in(here.path(), &["check", "cold.yaml"]));
    assert!(text.contains("  in the shop, "), "{text}");
    std::fs::write(here.path().join("warm.yaml"), joint("20 degC", "H7/k6")).unwrap();
    assert!(!stdout(&hubgrip_in(here.path(), &["check", "warm.yaml"])).contains("in the shop"));
    let json = stdout(&hubgrip_in(here.path(), &["check", "--json", "cold.yaml"]));
    let json: serde_json::Value = serde_json::from_str(&json).unwrap();
    let found = findings_of(&joint("-20 degC", "H7/k6"));
    let shown = json["extremes"]["tightest"]["shop_interference_um"].as_f64().unwrap();
    assert_relative_eq!(shown, found.extremes.tightest.shop_interference * 1e6, max_relative = 1e-9);
}

/// A population without scatter, of a pair with clearance at 20 °C, is the check of that pair.
#[test]
fn a_population_in_the_cold_has_the_force_of_the_check() {
    let text = joint("-20 degC", "{measured: {hole: 60.012 mm, shaft: 60.004 mm, uncertainty: 0 um}}")
        + "smoothing: {factor: 0.8, at: loosest}\nduty: [{state: rated, torque: 10 N.m}]\n\
           population:\n  hole: 60.012 mm\n  shaft: 60.004 mm\n  friction: 0.1\n  pressing_friction: 0.15\n";
    let joint = read::read(&text, std::path::Path::new("joint.yaml"), &[], &Library::built_in())
        .expect("it is right");
    let model = understood(&joint, &mut |_, _| unreachable!("no list is named")).unwrap().model;
    let analysis = Analysis::of(&model).unwrap();
    let pair = compute(joint).unwrap().extremes.tightest;
    assert!(pair.interference < 0.0 && pair.pressure > 0.0);
    let found = analysis.quantile(Quantity::PressForce, 0.5).unwrap();
    assert_relative_eq!(found, pair.press_force.high, max_relative = 1e-9);
    let (low, high) = model.limits(Quantity::PressForce);
    assert!(low <= high && high > 0.0);
}
