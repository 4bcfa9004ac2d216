//! The joint at work: what loosens it, which fits govern, slices, yielding, bending, length.

use maud::{Markup, html};

use super::table::scrolling;
use super::{Sheet, capital};
use crate::report::typeset::prose;
use crate::report::units::Measure;
use crate::report::{bearing, service};

/// Sentences, and the slices of a stepped joint.
pub(super) fn body(sheet: Sheet<'_>) -> Markup {
    html! {
        ul {
            @for sentence in service::sentences(sheet.findings) {
                li { (sentence) }
            }
        }
        (bearing(sheet))
        @if !sheet.findings.joint.slices.is_empty() {
            p { "Slice by slice: each slice by itself is good to 10 to 15\u{2009}%, the total to a few percent." }
            (scrolling("Slices along the joint", "slices", &slices(sheet)))
        }
    }
}

fn bearing(sheet: Sheet<'_>) -> Markup {
    let Some(title) = bearing::title(sheet.findings) else { return html! {} };
    let rows = bearing::rows(sheet.findings);
    let table = html! {
        thead { tr { th scope="col" { "Bearing" } th.r scope="col" { "Value" } th scope="col" { "At, limit or source" } } }
        tbody {
            @for row in rows {
                tr { th scope="row" { (row.name) } td.r { (prose(&row.value)) } td.small { (prose(&row.note)) } }
            }
        }
    };
    html! {
        h3 { "The bearing" }
        p { (capital(&title)) "." }
        (scrolling("What the seat does to the bearing", "bearing", &table))
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
