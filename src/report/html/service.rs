//! The joint at work: what loosens it, which fits govern, slices, yielding, bending, length.

use maud::{Markup, html};

use super::table::{cell, scrolling};
use super::{Sheet, capital};
use crate::findings::InterfaceFindings;
use crate::report::typeset::{prose, sentence};
use crate::report::units::Measure;
use crate::report::{bearing, service};

/// Sentences, then every interface and the slices of a stepped joint.
pub(super) fn body(sheet: Sheet) -> Markup {
    html! {
        ul { @for text in service::sentences(sheet.findings) { li { (sentence(&text)) } } }
        (bearing_table(sheet))
        (interfaces(sheet))
        (slices(sheet))
    }
}

/// What the seat does to a bearing ring.
fn bearing_table(sheet: Sheet<'_>) -> Markup {
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

/// Contact pressure at each interface; with two rings the other tables say it all.
fn interfaces(sheet: Sheet) -> Markup {
    let findings = sheet.findings;
    let joint = &findings.joint;
    if joint.rings.len() == 2 {
        return html! {};
    }
    let extremes = &findings.extremes;
    let mut rows =
        vec![("shop temperature, at rest", &extremes.loosest.interfaces, &extremes.tightest.interfaces)];
    for (state, duty) in joint.duty.iter().zip(&findings.duty) {
        rows.push((state.name.as_str(), &duty.loosest.interfaces, &duty.tightest.interfaces));
    }
    let table = html! {
        thead {
            tr {
                th scope="col" { "Contact pressure" span.unit { (sheet.units.unit(Measure::Pressure)) } }
                @for pair in joint.rings.windows(2) {
                    th colspan="2" scope="colgroup" { (pair[0].name) " / " (pair[1].name) }
                }
            }
            tr {
                th scope="col" { "State" }
                @for _ in &joint.fits {
                    th.n scope="col" { span.loosest { "○ loosest" } }
                    th.n scope="col" { span.tightest { "● tightest" } }
                }
            }
        }
        tbody {
            @for (name, loosest, tightest) in rows {
                tr {
                    th scope="row" { (name) }
                    @for index in 0..joint.fits.len() {
                        (pressure(sheet, loosest.get(index)))
                        (pressure(sheet, tightest.get(index)))
                    }
                }
            }
        }
    };
    html! { h3 { "Every interface" } (scrolling("Contact pressure at every interface", "interfaces", &table)) }
}

fn pressure(sheet: Sheet, interface: Option<&InterfaceFindings>) -> Markup {
    match interface {
        Some(interface) if interface.open => html! { td.n { "open" } },
        other => cell(sheet.units, Measure::Pressure, other.map(|interface| interface.pressure)),
    }
}

/// The slices of a stepped joint, from the end that enters first.
fn slices(sheet: Sheet) -> Markup {
    let extremes = &sheet.findings.extremes;
    if extremes.loosest.slices.is_empty() {
        return html! {};
    }
    let units = sheet.units;
    let size = units.unit(Measure::Size);
    let pressure = units.unit(Measure::Pressure);
    let table = html! {
        thead {
            tr {
                th scope="col" { "Slice" }
                th.n scope="col" { "length" span.unit { (size) } }
                th.n scope="col" { "outer diameter" span.unit { (size) } }
                th.n scope="col" { "bore of the shaft" span.unit { (size) } }
                th.n scope="col" { span.loosest { "○ loosest" } span.unit { (pressure) } }
                th.n scope="col" { span.tightest { "● tightest" } span.unit { (pressure) } }
            }
        }
        tbody {
            @for (index, (loosest, tightest)) in extremes.loosest.slices.iter().zip(&extremes.tightest.slices).enumerate() {
                tr {
                    th scope="row" { (index + 1) }
                    (cell(units, Measure::Size, Some(loosest.length)))
                    (cell(units, Measure::Size, Some(loosest.hub_outer_diameter)))
                    (cell(units, Measure::Size, Some(loosest.shaft_bore)))
                    (cell(units, Measure::Pressure, Some(loosest.pressure)))
                    (cell(units, Measure::Pressure, Some(tightest.pressure)))
                }
            }
        }
    };
    html! {
        h3 { "Contact pressure along the joint" }
        (scrolling("Contact pressure along the joint", "slices", &table))
        p.small { "From the end that enters first. The total is good to a few per cent, each slice by itself to 10 to 15 %." }
    }
}
