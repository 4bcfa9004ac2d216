//! The report: one self-contained page that prints, is read from top to bottom, and is signed.
//!
//! The page is well-formed XML as well as HTML, needs no script and no network, and is the same to the byte
//! for the same findings.

mod answers;
mod duty;
mod extremes;
mod inputs;
mod instructions;
mod materials;
mod notes;
mod pictures;
mod service;
mod table;
mod title_block;
mod worksheet;

use maud::{Markup, html};

use super::page::page;
use super::typeset::capital;
use super::units::Units;
use crate::findings::Findings;

/// What every part of the page is made from.
#[derive(Clone, Copy)]
struct Sheet<'a> {
    findings: &'a Findings,
    units: Units,
}

/// The report of a joint as one HTML file.
///
/// # Example
/// ```
/// use hubgrip::material::library::Library;
/// use hubgrip::{findings, joint, report};
/// let text = joint::template::find(None).unwrap().text;
/// let joint = joint::read::read(text, "joint.yaml".as_ref(), &[], &Library::built_in()).unwrap();
/// let page = report::html::html(&findings::compute(joint).unwrap());
/// assert!(page.starts_with("<!DOCTYPE html>") && !page.contains("<script"));
/// ```
pub fn html(findings: &Findings) -> String {
    let sheet = Sheet { findings, units: Units { system: findings.joint.display } };
    let title = title_block::title(&findings.joint);
    let body = html! {
        (title_block::header(sheet))
        (contents())
        main {
            @for (number, part) in PARTS.iter().enumerate() {
                section id=(part.id) aria-labelledby=(format!("h-{}", part.id)) {
                    h2 id=(format!("h-{}", part.id)) {
                        span.number { (number + 1) } " " (part.heading)
                    }
                    ((part.body)(sheet))
                }
            }
        }
        (title_block::footer(sheet))
    };
    page(&title, &body)
}

/// One numbered part of the page.
struct Part {
    id: &'static str,
    heading: &'static str,
    body: fn(Sheet) -> Markup,
}

const PARTS: [Part; 11] = [
    Part { id: "answers", heading: "Verdict", body: answers::body },
    Part { id: "section", heading: "Section", body: pictures::section },
    Part { id: "extremes", heading: "Extreme pairs", body: extremes::body },
    Part { id: "pictures", heading: "Pictures", body: pictures::plots },
    Part { id: "duty", heading: "Duty", body: duty::body },
    Part { id: "service", heading: "At work", body: service::body },
    Part { id: "assembly", heading: "Assembly", body: instructions::body },
    Part { id: "worksheet", heading: "Worksheet", body: worksheet::body },
    Part { id: "inputs", heading: "Inputs", body: inputs::body },
    Part { id: "materials", heading: "Materials", body: materials::body },
    Part { id: "notes", heading: "Cautions and notes", body: notes::body },
];

/// Number and link of a part, such as `part 5`.
fn part(id: &str) -> Markup {
    html! { a href=(format!("#{id}")) { "part " (number_of(id)) } }
}

/// Number of a part, before the number of a heading within it.
fn number_of(id: &str) -> usize {
    PARTS.iter().position(|part| part.id == id).map_or(0, |place| place + 1)
}

fn contents() -> Markup {
    html! {
        nav aria-label="Contents" {
            ol {
                @for part in &PARTS {
                    li { a href=(format!("#{}", part.id)) { (part.heading) } }
                }
            }
        }
    }
}
