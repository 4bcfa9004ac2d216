//! Cautions in full, then what is not covered.

use maud::{Markup, html};

use super::{Sheet, capital};
use crate::findings::Caution;
use crate::report::typeset::{prose, sentence};

/// Subjects of cautions in the order they are printed, with their headings.
const SUBJECTS: [(&str, &str); 6] = [
    ("input", "Input"),
    ("hold", "Hold"),
    ("strength", "Strength"),
    ("press", "Pressing"),
    ("heat", "Heating"),
    ("cold", "Chilling"),
];

/// Cautions by subject and notes.
pub(super) fn body(sheet: Sheet) -> Markup {
    let findings = sheet.findings;
    html! {
        h3 { "Cautions" }
        @if findings.cautions.is_empty() { p { "None." } }
        @for (subject, heading) in subjects(&findings.cautions) {
            h4 { (heading) }
            ul.cautions {
                @for caution in findings.cautions.iter().filter(|caution| caution.subject == subject) {
                    li { (prose(&caution.text)) " " span.source { (caution.source) } }
                }
            }
        }
        h3 { "Validity and notes" }
        @if findings.notes.is_empty() { p { "None." } }
        ul {
            @for note in &findings.notes { li { (sentence(note)) } }
        }
    }
}

fn subjects(cautions: &[Caution]) -> Vec<(&'static str, String)> {
    let mut found: Vec<(&'static str, String)> = SUBJECTS
        .iter()
        .filter(|(subject, _)| cautions.iter().any(|caution| caution.subject == *subject))
        .map(|(subject, heading)| (*subject, (*heading).to_owned()))
        .collect();
    for caution in cautions {
        if !found.iter().any(|(subject, _)| *subject == caution.subject) {
            found.push((caution.subject, capital(caution.subject)));
        }
    }
    found
}
