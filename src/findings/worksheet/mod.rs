//! The derivation line by line, so that a checker can redo any line by hand.
//!
//! Metric sheets work in mm, N, MPa and µm; inch sheets in in, lbf, psi and thou (0.001 in). Both sets are
//! coherent but for the factor 1000 between µm and mm (thou and in), which the formulas show.

mod assembly;
mod bearing;
mod bending;
mod cold_bath;
mod duty;
mod faces;
mod fit;
mod frost;
mod governing;
mod rings;
mod sheet;
mod slices;
mod stack;
mod strength;

use super::{Findings, WorksheetSection};
use crate::quantity::UnitSystem;
use sheet::Sheet;

/// The worksheet of a joint with its findings.
pub(super) fn worksheet(findings: &Findings) -> Vec<WorksheetSection> {
    worked(findings).0
}

/// The worksheet and every line that does not agree with the program's own figure (none, ever).
///
/// Tests call this for every example: a line that drifts from the code shows here.
pub fn worked(findings: &Findings) -> (Vec<WorksheetSection>, Vec<String>) {
    let mut sheet = Sheet::new();
    let units = Units::of(findings.joint.display);
    if findings.joint.rings.len() > 2 {
        stack::write(&mut sheet, findings, &units);
        rings::write(&mut sheet, findings, &units);
        bending::write(&mut sheet, findings, &units);
    } else if !findings.joint.slices.is_empty() {
        slices::write(&mut sheet, findings, &units);
        bending::write(&mut sheet, findings, &units);
    } else {
        fit::write(&mut sheet, findings, &units);
        strength::write(&mut sheet, findings, &units);
        duty::write(&mut sheet, findings, &units);
        governing::write(&mut sheet, findings, &units);
        bending::write(&mut sheet, findings, &units);
        assembly::write(&mut sheet, findings, &units);
        bearing::write(&mut sheet, findings, &units);
    }
    sheet.finish()
}

/// The coherent units of a sheet, each with how many of it make one SI unit.
struct Units {
    length: &'static str,
    per_metre: f64,
    small: &'static str,
    small_per_metre: f64,
    pressure: &'static str,
    per_pascal: f64,
    force: &'static str,
    per_newton: f64,
    torque: &'static str,
    per_newton_metre: f64,
    /// Torque in force times length, divided by this, is in the printed torque unit.
    torque_divisor: &'static str,
    temperature: &'static str,
    density: &'static str,
    per_kilogram_per_cubic_metre: f64,
}

const PSI: f64 = 6894.757293168361;
const POUND_FORCE: f64 = 4.4482216152605;
const INCH: f64 = 0.0254;

impl Units {
    fn of(system: UnitSystem) -> Self {
        match system {
            UnitSystem::Metric => Self {
                length: "mm",
                per_metre: 1e3,
                small: "um",
                small_per_metre: 1e6,
                pressure: "MPa",
                per_pascal: 1e-6,
                force: "N",
                per_newton: 1.0,
                torque: "N.m",
                per_newton_metre: 1.0,
                torque_divisor: "1000",
                temperature: "degC",
                density: "t/mm3",
                per_kilogram_per_cubic_metre: 1e-12,
            },
            UnitSystem::Inch => Self {
                length: "in",
                per_metre: 1.0 / INCH,
                small: "thou",
                small_per_metre: 1e3 / INCH,
                pressure: "psi",
                per_pascal: 1.0 / PSI,
                force: "lbf",
                per_newton: 1.0 / POUND_FORCE,
                torque: "lbf.ft",
                per_newton_metre: 1.0 / (POUND_FORCE * INCH * 12.0),
                torque_divisor: "12",
                temperature: "degF",
                density: "lbf.s2/in4",
                per_kilogram_per_cubic_metre: INCH.powi(4) / POUND_FORCE,
            },
        }
    }

    fn degrees(&self, kelvin: f64) -> f64 {
        let celsius = kelvin - 273.15;
        if self.temperature == "degC" { celsius } else { celsius * 1.8 + 32.0 }
    }
}
