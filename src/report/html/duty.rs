//! The duty states, a row each: what loads the joint, and what was found at both extremes.

use maud::{Markup, html};

use super::Sheet;
use super::table::{NONE, aligned, cell, safety, scrolling};
use crate::findings::{DutyFindings, StateFindings};
use crate::joint::DutyState;
use crate::report::units::Measure;

/// The tables.
pub(super) fn body(sheet: Sheet) -> Markup {
    html! {
        (scrolling("Loads of the duty states", "duty", &loads(sheet)))
        (scrolling("Duty states at both extremes", "duty", &found(sheet)))
        p.small {
            "Slip is judged at the loosest pair, strength at the tightest. Temperatures are those of the rings from the "
            "innermost outwards, in a radial gradient from face to face."
            @if changed(sheet) {
                " Young’s modulus is that at the temperature of each ring, in a radial gradient at the mean over its section."
            }
        }
    }
}

/// A load that has a column when any state has it.
struct Load {
    name: &'static str,
    measure: Measure,
    of: fn(&DutyState) -> f64,
    always: bool,
}

const LOADS: [Load; 7] = [
    Load { name: "torque", measure: Measure::Torque, of: |state| state.torque, always: true },
    Load { name: "axial force", measure: Measure::Force, of: |state| state.axial_force, always: true },
    Load { name: "speed", measure: Measure::Speed, of: |state| state.speed, always: false },
    Load {
        name: "bending moment",
        measure: Measure::Torque,
        of: |state| state.bending_moment,
        always: false,
    },
    Load { name: "radial force", measure: Measure::Force, of: |state| state.radial_force, always: false },
    Load {
        name: "pressure inside",
        measure: Measure::Pressure,
        of: |state| state.inner_pressure,
        always: false,
    },
    Load {
        name: "pressure outside",
        measure: Measure::Pressure,
        of: |state| state.outer_pressure,
        always: false,
    },
];

fn loads(sheet: Sheet) -> Markup {
    let duty = &sheet.findings.joint.duty;
    let shown: Vec<&Load> =
        LOADS.iter().filter(|load| load.always || duty.iter().any(|state| (load.of)(state) != 0.0)).collect();
    let moduli = changed(sheet);
    let remarks = duty.iter().any(|state| !remark(state).is_empty());
    html! {
        thead {
            tr {
                th scope="col" { "State" }
                @for load in &shown { (head(load.name, &sheet.units.unit(load.measure))) }
                (head("temperature", &sheet.units.unit(Measure::Temperature)))
                @if moduli { (head("Young’s modulus", &sheet.units.unit(Measure::Modulus))) }
                @if remarks { th scope="col" { "Kind" } }
            }
        }
        tbody {
            @for (state, found) in duty.iter().zip(&sheet.findings.duty) {
                tr {
                    th scope="row" { (state.name) }
                    @for load in &shown { (cell(sheet.units, load.measure, Some((load.of)(state)))) }
                    td.n { (temperatures(sheet, state)) }
                    @if moduli { td.n { (youngs_moduli(sheet, found)) } }
                    @if remarks { td { (remark(state)) } }
                }
            }
        }
    }
}

/// Whether the modulus of any ring in any state is not that of 20 °C.
fn changed(sheet: Sheet) -> bool {
    let rings = &sheet.findings.joint.rings;
    let own = |found: &DutyFindings| {
        let rings = rings.iter().zip(&found.youngs_moduli);
        rings.into_iter().any(|(ring, modulus)| *modulus != ring.material.youngs_modulus.value)
    };
    sheet.findings.duty.iter().any(own)
}

/// One number when all rings have the same.
fn youngs_moduli(sheet: Sheet, found: &DutyFindings) -> String {
    let moduli = found.youngs_moduli.iter();
    let mut all: Vec<String> =
        moduli.map(|modulus| sheet.units.reading(Measure::Modulus, *modulus).number).collect();
    if all.windows(2).all(|pair| pair[0] == pair[1]) {
        all.truncate(1);
    }
    all.join(" / ")
}

fn remark(state: &DutyState) -> String {
    let mut remarks = Vec::new();
    if state.reversing {
        remarks.push("torque reverses");
    }
    if state.rotating_bending {
        remarks.push("bending turns with the shaft");
    }
    remarks.join(", ")
}

fn found(sheet: Sheet) -> Markup {
    let joint = &sheet.findings.joint;
    let units = sheet.units;
    let bending = sheet.findings.duty.iter().any(|duty| duty.loosest.bending.is_some());
    html! {
        thead {
            tr {
                th rowspan="2" scope="col" { "State" }
                th colspan=(4 + usize::from(bending)) scope="colgroup" { span.loosest { "○ loosest" } }
                th colspan=(1 + joint.rings.len()) scope="colgroup" { span.tightest { "● tightest" } }
            }
            tr {
                (head("pressure", &units.unit(Measure::Pressure)))
                @if bending { (head("at the edge, least", &units.unit(Measure::Pressure))) }
                (head("torque at slip", &units.unit(Measure::Torque)))
                (head("axial at slip", &units.unit(Measure::Force)))
                (head("safety against slip", ""))
                (head("pressure", &units.unit(Measure::Pressure)))
                @for ring in &joint.rings { (head(&format!("safety, {}", ring.name), "")) }
            }
        }
        tbody {
            @for (state, found) in joint.duty.iter().zip(&sheet.findings.duty) {
                tr {
                    th scope="row" { (state.name) }
                    (cell(units, Measure::Pressure, Some(found.loosest.pressure)))
                    @if bending {
                        (cell(units, Measure::Pressure, found.loosest.bending.map(|bending| bending.least_edge)))
                    }
                    (cell(units, Measure::Torque, Some(found.loosest.torque_capacity)))
                    (cell(units, Measure::Force, Some(found.loosest.axial_capacity)))
                    (optional_safety(found.loosest.slip_safety))
                    (cell(units, Measure::Pressure, Some(found.tightest.pressure)))
                    (ring_safeties(&found.tightest, joint.rings.len()))
                }
            }
        }
    }
}

fn head(name: &str, unit: &str) -> Markup {
    html! { th.n scope="col" { (name) @if !unit.is_empty() { span.unit { (unit) } } } }
}

fn optional_safety(value: Option<f64>) -> Markup {
    match value {
        Some(value) => aligned(&safety(value)),
        None => html! { td.n { (NONE) } },
    }
}

fn ring_safeties(state: &StateFindings, count: usize) -> Markup {
    html! {
        @for index in 0..count {
            (optional_safety(state.rings.get(index).and_then(|ring| ring.safety)))
        }
    }
}

/// One number when all rings are as warm as each other; from inner to outer face in a radial gradient.
fn temperatures(sheet: Sheet, state: &DutyState) -> String {
    let number = |kelvin: f64| sheet.units.reading(Measure::Temperature, kelvin).number;
    let mut all: Vec<String> = state
        .temperatures
        .iter()
        .enumerate()
        .map(|(ring, inner)| match state.temperature_rises.get(ring) {
            Some(rise) if *rise != 0.0 => format!("{} to {}", number(*inner), number(inner + rise)),
            _ => number(*inner),
        })
        .collect();
    all.dedup();
    all.join(" / ")
}
