//! The duty states, a row each.

use maud::{Markup, html};

use super::Sheet;
use super::table::{NONE, aligned, cell, safety, scrolling};
use crate::findings::StateFindings;
use crate::joint::DutyState;
use crate::report::units::Measure;

/// The table.
pub(super) fn body(sheet: Sheet) -> Markup {
    let joint = &sheet.findings.joint;
    let safeties: Vec<String> = joint.rings.iter().map(|ring| format!("safety, {}", ring.name)).collect();
    let units = sheet.units;
    let table = html! {
        thead {
            tr {
                th rowspan="2" scope="col" { "State" }
                th colspan="3" scope="colgroup" { "Load" }
                th colspan="4" scope="colgroup" { span.loosest { "○ loosest" } }
                th colspan=(1 + safeties.len()) scope="colgroup" { span.tightest { "● tightest" } }
            }
            tr {
                (head("torque", &units.unit(Measure::Torque)))
                (head("axial force", &units.unit(Measure::Force)))
                (head("temperature", &units.unit(Measure::Temperature)))
                (head("pressure", &units.unit(Measure::Pressure)))
                (head("torque at slip", &units.unit(Measure::Torque)))
                (head("axial at slip", &units.unit(Measure::Force)))
                (head("slip safety", ""))
                (head("pressure", &units.unit(Measure::Pressure)))
                @for name in &safeties { (head(name, "")) }
            }
        }
        tbody {
            @for (state, found) in joint.duty.iter().zip(&sheet.findings.duty) {
                tr {
                    th scope="row" { (state.name) }
                    (cell(units, Measure::Torque, Some(state.torque)))
                    (cell(units, Measure::Force, Some(state.axial_force)))
                    td.n { (temperatures(sheet, state)) }
                    (cell(units, Measure::Pressure, Some(found.loosest.pressure)))
                    (cell(units, Measure::Torque, Some(found.loosest.torque_capacity)))
                    (cell(units, Measure::Force, Some(found.loosest.axial_capacity)))
                    (optional_safety(found.loosest.slip_safety))
                    (cell(units, Measure::Pressure, Some(found.tightest.pressure)))
                    (ring_safeties(&found.tightest, safeties.len()))
                }
            }
        }
    };
    html! {
        (scrolling("Duty states", "duty", &table))
        p.small {
            "Slip is judged at the loosest pair, strength at the tightest. Temperatures are those of the rings from the innermost outwards."
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

/// One number when all rings are as warm as each other.
fn temperatures(sheet: Sheet, state: &DutyState) -> String {
    let mut all: Vec<String> = state
        .temperatures
        .iter()
        .map(|value| sheet.units.reading(Measure::Temperature, *value).number)
        .collect();
    all.dedup();
    all.join(" / ")
}
