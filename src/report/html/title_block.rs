//! Title block in the manner of a drawing's (data fields of ISO 7200:2004), and the foot of the page.

use maud::{Markup, html};

use super::Sheet;
use crate::joint::Joint;
use crate::quantity::UnitSystem;

/// Title of the page; a joint without one is named by its fits.
pub(super) fn title(joint: &Joint) -> String {
    if !joint.title.trim().is_empty() {
        return joint.title.clone();
    }
    let fits: Vec<&str> = joint.fits.iter().map(|fit| fit.callout.as_str()).collect();
    format!("Interference joint {}", fits.join(", "))
}

/// The title block.
pub(super) fn header(sheet: Sheet) -> Markup {
    let joint = &sheet.findings.joint;
    html! {
        header.title-block {
            p.kind { "Calculation sheet · interference joint" }
            h1 { (title(joint)) }
            dl.fields {
                (field("Document number, revision", joint.drawing.as_deref().unwrap_or("–")))
                (field("Date of issue", joint.date.as_deref().unwrap_or("–")))
                (field("Units", units_name(joint.display)))
                (field("Calculated with", &tool()))
            }
            @if let Some(note) = &joint.note { p.note { (note) } }
            dl.signatures {
                (signature("Made by"))
                (signature("Checked by"))
            }
            dl.trace {
                dt { "Input, SHA-256" }
                dd.digest { (groups(&joint.digest)) }
                dt { "Changed with --set" }
                dd {
                    @if joint.set.is_empty() { "nothing" }
                    @for (place, (key, value)) in joint.set.iter().enumerate() {
                        @if place > 0 { ", " }
                        code { (key) "=" (value) }
                    }
                }
            }
        }
    }
}

/// The foot of the page: what the signature vouches for.
pub(super) fn footer(sheet: Sheet) -> Markup {
    let joint = &sheet.findings.joint;
    html! {
        footer {
            p {
                (title(joint))
                @if let Some(drawing) = &joint.drawing { " · " (drawing) }
                " · " (tool()) " · input " (joint.digest.chars().take(12).collect::<String>())
            }
        }
    }
}

fn tool() -> String {
    format!("hubgrip {}", env!("CARGO_PKG_VERSION"))
}

fn units_name(system: UnitSystem) -> &'static str {
    match system {
        UnitSystem::Metric => "metric (mm, N, MPa, °C)",
        UnitSystem::Inch => "inch (in, lbf, ksi, °F)",
    }
}

fn field(name: &str, value: &str) -> Markup {
    html! { div { dt { (name) } dd { (value) } } }
}

fn signature(role: &str) -> Markup {
    html! {
        div { dt { (role) } dd.line {} }
        div.when { dt { "Date" } dd.line {} }
    }
}

/// The digest in groups of eight, which can be compared by eye.
fn groups(digest: &str) -> String {
    let letters: Vec<char> = digest.chars().collect();
    letters.chunks(8).map(|group| group.iter().collect::<String>()).collect::<Vec<_>>().join(" ")
}
