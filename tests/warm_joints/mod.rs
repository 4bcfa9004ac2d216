//! Joints whose materials have Young's modulus against temperature, for the tests of it.
#![allow(dead_code)]

use std::path::Path;

use hubgrip::findings::{Findings, compute};
use hubgrip::joint::{Joint, read};
use hubgrip::material::library::Library;

/// Two invented materials with round figures; E at −60, 20, 120 and 220 °C stands in their tables.
pub const STEEL: &str = "kind: ductile, youngs_modulus: 200 GPa, poisson: 0.3, density: 7800 kg/m3, \
                     expansion: {mean: 12e-6 /K, from: -60 degC}, \
                     conductivity: 50 W/m.K, yield_strength: 900 MPa, tensile_strength: 1100 MPa";
pub const ALUMINIUM: &str = "kind: ductile, youngs_modulus: 70 GPa, poisson: 0.33, density: 2700 kg/m3, \
                         expansion: {mean: 23e-6 /K, from: -60 degC}, \
                         conductivity: 200 W/m.K, yield_strength: 400 MPa, tensile_strength: 500 MPa";
pub const STEEL_CURVE: &str = "youngs_modulus_curve: {moduli: [[-60 degC, 208 GPa], [20 degC, 200 GPa], [120 degC, 190 GPa], [220 degC, 170 GPa]]}";
pub const ALUMINIUM_CURVE: &str =
    "youngs_modulus_curve: {ratios: [[-60 degC, 1.05], [20 degC, 1], [120 degC, 0.9], [220 degC, 0.7]]}";

pub fn joint(text: &str) -> Joint {
    let joint = read::read(text, Path::new("test.yaml"), &[], &Library::built_in());
    joint.unwrap_or_else(|faults| panic!("{text}\n{faults:?}"))
}

pub fn findings(text: &str) -> Findings {
    compute(joint(text)).unwrap_or_else(|error| panic!("{text}\n{error}"))
}

/// Two parts of 50 mm and 40 mm length, the hub of 100 mm, without loss by smoothing; `interference` in µm at every pair.
pub fn two_parts(shaft: &str, hub: &str, interference: f64, rest: &str) -> String {
    format!(
        "joint_file: 1\ndiameter: 50 mm\nlength: 40 mm\nshaft: {{{shaft}}}\nhub: {{{hub}, outer_diameter: 100 mm}}\n\
         fit: {{hole: {{lower: 0 um, upper: 0 um}}, shaft: {{lower: {interference} um, upper: {interference} um}}}}\n\
         friction: {{holding: 0.12}}\nsmoothing: {{factor: 0}}\n{rest}"
    )
}

pub fn material(base: &str, curve: &str) -> String {
    if curve.is_empty() { format!("material: {{{base}}}") } else { format!("material: {{{base}, {curve}}}") }
}
