//! Diagnostics for a person and for a program.

use std::fmt::Write;

use anstyle::{AnsiColor, Style};
use serde::Serialize;

use crate::diagnostic::Diagnostic;

const ERROR: Style = AnsiColor::Red.on_default().bold();
const MARK: Style = AnsiColor::Red.on_default();
const MARGIN: Style = AnsiColor::Blue.on_default();
const HELP: Style = AnsiColor::Cyan.on_default().bold();

/// Columns of a line that are shown, and where the window begins when the place lies far to the right.
const SHOWN: usize = 160;
const BEFORE: usize = 40;

/// The message with its place first, the line with a mark under it, and the way out.
///
/// # Example
/// ```
/// use hubgrip::diagnostic::{Diagnostic, Place};
/// let text = "diameter: 60 mm\nlength: 70\n";
/// let fault = Diagnostic::new("70 has no unit: write 70 mm")
///     .in_file("joint.yaml")
///     .at(text, Place { line: 2, column: 9 }, 2);
/// let told = hubgrip::report::diagnostics::text(&fault);
/// assert!(told.contains("length: 70"));
/// ```
pub fn text(diagnostic: &Diagnostic) -> String {
    let mut out = String::new();
    let place = place(diagnostic);
    let _ = writeln!(out, "{place}{ERROR}error{ERROR:#}: {}", clean(&diagnostic.message));
    snippet(&mut out, diagnostic);
    if let Some(help) = &diagnostic.help {
        let mut lines = help.lines();
        let _ = writeln!(out, "  {HELP}help{HELP:#}: {}", clean(lines.next().unwrap_or_default()));
        for line in lines {
            let _ = writeln!(out, "        {}", clean(line));
        }
    }
    out
}

/// `file:line:column: `, as far as they are known.
fn place(diagnostic: &Diagnostic) -> String {
    let Some(file) = &diagnostic.file else { return "hubgrip: ".to_owned() };
    let file = clean(&file.display().to_string());
    match diagnostic.place {
        Some(place) => format!("{file}:{}:{}: ", place.line, place.column),
        None => format!("{file}: "),
    }
}

fn snippet(out: &mut String, diagnostic: &Diagnostic) {
    let (Some(place), Some(line)) = (diagnostic.place, &diagnostic.line_text) else { return };
    let number = place.line.to_string();
    let margin = " ".repeat(number.len());
    let before = place.column.saturating_sub(1);
    let skipped = if before > SHOWN { before - BEFORE } else { 0 };
    let shown: String = line.chars().skip(skipped).take(SHOWN).map(blank).collect();
    let indent: usize = line.chars().skip(skipped).take(before - skipped).map(columns).sum();
    let marked: usize = line.chars().skip(before).take(diagnostic.width).map(columns).sum();
    let mark = "^".repeat(marked.clamp(1, SHOWN));
    let dots = if skipped > 0 { "…" } else { "" };
    let pad = " ".repeat(indent + dots.chars().count());
    let _ = writeln!(out, " {MARGIN}{margin} |{MARGIN:#}");
    let _ = writeln!(out, " {MARGIN}{number} |{MARGIN:#} {dots}{}", shown.trim_end());
    let _ = writeln!(out, " {MARGIN}{margin} |{MARGIN:#} {pad}{MARK}{mark}{MARK:#}");
}

/// Columns that a character takes on a terminal; a control character is shown as a blank.
fn columns(character: char) -> usize {
    textwrap::core::display_width(&blank(character).to_string())
}

fn blank(character: char) -> char {
    if character.is_control() { ' ' } else { character }
}

fn clean(text: &str) -> String {
    text.chars().map(blank).collect()
}

#[derive(Serialize)]
struct Told<'a> {
    error: Error<'a>,
}

#[derive(Serialize)]
struct Error<'a> {
    message: &'a str,
    file: Option<String>,
    line: Option<usize>,
    column: Option<usize>,
    help: Option<&'a str>,
}

/// The same as one JSON object on a line: `{"error": {message, file, line, column, help}}`.
pub fn json(diagnostic: &Diagnostic) -> String {
    let told = Told {
        error: Error {
            message: &diagnostic.message,
            file: diagnostic.file.as_ref().map(|file| file.display().to_string()),
            line: diagnostic.place.map(|place| place.line),
            column: diagnostic.place.map(|place| place.column),
            help: diagnostic.help.as_deref(),
        },
    };
    let mut line = serde_json::to_string(&told).unwrap_or_default();
    line.push('\n');
    line
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::diagnostic::Place;

    fn told(line: &str, column: usize, width: usize) -> String {
        let fault = Diagnostic::new("wrong").in_file("f.yaml").at(line, Place { line: 1, column }, width);
        anstream::adapter::strip_str(&text(&fault)).to_string()
    }

    #[test]
    fn the_mark_stands_under_the_place() {
        assert_eq!(
            told("length: 70", 9, 2),
            "f.yaml:1:9: error: wrong\n   |\n 1 | length: 70\n   |         ^^\n"
        );
    }

    #[test]
    fn the_mark_is_right_behind_tabs_and_wide_characters() {
        let told = told("\t軸: 70", 5, 2);
        let lines: Vec<&str> = told.lines().collect();
        assert_eq!(lines[2], " 1 |  軸: 70");
        assert_eq!(lines[3], "   |      ^^");
    }

    #[test]
    fn a_place_far_to_the_right_is_still_shown() {
        let line = format!("{}: bad", "x".repeat(5000));
        let told = told(&line, 5003, 3);
        assert!(told.contains("bad") && told.contains("^^^") && told.len() < 1000);
    }

    #[test]
    fn control_characters_do_not_reach_the_terminal() {
        let fault = Diagnostic::new("bad \u{1b}[31m text").in_file("f\u{1b}[2J.yaml");
        assert!(!anstream::adapter::strip_str(&text(&fault)).to_string().contains('\u{1b}'));
    }
}
