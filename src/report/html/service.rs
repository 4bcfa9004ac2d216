//! The joint at work: what loosens it, which fits govern, slices, yielding, bending, length.

use maud::{Markup, html};

use super::Sheet;
use super::table::scrolling;
use crate::report::service;
use crate::report::units::Measure;

/// Sentences, and the slices of a stepped joint.
pub(super) fn body(sheet: Sheet<'_>) -> Markup {
    html! {
        ul {
            @for sentence in service::sentences(sheet.findings) {
                li { (sentence) }
            }
        }
        @if !sheet.findings.joint.slices.is_empty() {
            p { "Slice by slice: each slice by itself is good to 10 to 15\u{2009}%, the total to a few percent." }
            (scrolling("Slices along the joint", "slices", &slices(sheet)))
        }
    }
}

fn slices(sheet: Sheet<'_>) -> Markup {
    let units = sheet.units;
    let extremes = &sheet.findings.extremes;
    html! {
        thead {
            tr {
                th scope="col" { "Slice" }
                th.r scope="col" { "Length" }
                th.r scope="col" { "Outer diameter" }
                th.r scope="col" { "Bore" }
                th.r scope="col" { "Pressure, loosest" }
                th.r scope="col" { "Pressure, tightest" }
            }
        }
        tbody {
            @for (index, (loosest, tightest)) in extremes.loosest.slices.iter().zip(&extremes.tightest.slices).enumerate() {
                tr {
                    th scope="row" { (index + 1) }
                    td.r { (units.text(Measure::Size, loosest.length)) }
                    td.r { (units.text(Measure::Size, loosest.hub_outer_diameter)) }
                    td.r { (units.text(Measure::Size, loosest.shaft_bore)) }
                    td.r { (units.text(Measure::Pressure, loosest.pressure)) }
                    td.r { (units.text(Measure::Pressure, tightest.pressure)) }
                }
            }
        }
    }
}
