//! The derivation line by line: symbol = formula = numbers put in = result, with its source.

use std::collections::BTreeMap;

use maud::{Markup, html};

use super::table::scrolling;
use super::{Sheet, number_of};
use crate::findings::expression::{Expression, Symbol};
use crate::findings::{WorksheetLine, WorksheetSection};
use crate::report::mathml;

/// Printed value of each symbol seen so far.
type Values = BTreeMap<Symbol, String>;

/// All sections; each can also be copied as plain text.
pub(super) fn body(sheet: Sheet) -> Markup {
    let mut values = Values::new();
    html! {
        p {
            "Every line can be redone by hand with the numbers as printed: symbol = formula = numbers put in = result. "
            "A number put in is the printed result of the line that defines its symbol, in the unit given there. "
            "What an iteration, a linear system or a curve gives stands as an input with its source; soak and seating times and "
            "the speed and temperature of opening are told in their parts and not derived here."
        }
        @for (index, section) in sheet.findings.worksheet().iter().enumerate() {
            h3 { span.number { (number_of("worksheet")) "." (index + 1) } " " (section.title) }
            (scrolling(&section.title, "worksheet", &table(section, index + 1, &mut values)))
            (plain_twin(section, &values))
        }
    }
}

fn table(section: &WorksheetSection, number: usize, values: &mut Values) -> Markup {
    html! {
        thead {
            tr {
                th scope="col" { "Line" }
                th scope="col" { "What, and where it comes from" }
                th scope="col" { "Symbol = formula = numbers = result" }
            }
        }
        tbody {
            @for (index, line) in section.lines.iter().enumerate() {
                @let repeated = index > 0 && section.lines[index - 1].source == line.source && line.source.len() > 24;
                @let source = if repeated { "as the line above" } else { line.source.as_str() };
                (row(line, &format!("{number}.{}", index + 1), source, values))
            }
        }
    }
}

fn row(line: &WorksheetLine, number: &str, source: &str, values: &mut Values) -> Markup {
    let known = values.clone();
    values.insert(line.symbol.clone(), line.printed.clone());
    html! {
        tr {
            th.no scope="row" { (number) }
            td.what { (line.meaning) span.source { (source) } }
            @match line.formula.as_ref().map_or(0, width) {
                0..=34 => td { (chain(line, &known)) },
                35..=52 => td.long { (chain(line, &known)) },
                _ => td.longer { (chain(line, &known)) },
            }
        }
    }
}

/// The equation in pieces that may stand in separate rows when the line is too long for one.
fn chain(line: &WorksheetLine, known: &Values) -> Markup {
    let look_up = |symbol: &Symbol| known.get(symbol).cloned();
    let result = mathml::with_unit(&line.printed, &line.unit);
    html! {
        @match &line.formula {
            None => {
                math alttext=(plain(line, known)) { mrow { (mathml::symbol(&line.symbol)) mo { "=" } (result) } }
            }
            Some(formula) => {
                math alttext=(plain(line, known)) {
                    mrow { (mathml::symbol(&line.symbol)) mo { "=" } (mathml::expression(formula)) }
                }
                " "
                @if has_known_symbols(formula, known) {
                    math { mrow { mo { "=" } (mathml::substituted(formula, &look_up)) } }
                    " "
                }
                math.result { mrow { mo { "=" } (result) } }
            }
        }
    }
}

fn has_known_symbols(formula: &Expression, known: &Values) -> bool {
    formula.symbols().iter().any(|symbol| known.contains_key(symbol))
}

/// About how many letters wide the formula is with numbers put in; a wide one is set in smaller type.
fn width(formula: &Expression) -> usize {
    match formula {
        Expression::Number(text) => text.chars().count(),
        Expression::Symbol(_) => 5,
        Expression::Sum(a, b) | Expression::Difference(a, b) | Expression::Product(a, b) => {
            width(a) + width(b) + 2
        }
        Expression::Quotient(a, b) => width(a).max(width(b)),
        Expression::Power(a, _) | Expression::Root(a) | Expression::Negative(a) => width(a) + 2,
        Expression::Call(_, a) => width(a) + 5,
        Expression::Greatest(all) | Expression::Least(all) => {
            all.iter().map(|one| width(one) + 2).sum::<usize>() + 5
        }
    }
}

/// One line as plain text, such as `p = U / d = 0.05 / 50 = 0.001 MPa`.
fn plain(line: &WorksheetLine, known: &Values) -> String {
    let mut text = line.symbol.plain();
    if let Some(formula) = &line.formula {
        text.push_str(&format!(" = {}", formula.plain()));
        if has_known_symbols(formula, known) {
            let numbers =
                formula.substituted(&|symbol| known.get(symbol).cloned().unwrap_or_else(|| symbol.plain()));
            text.push_str(&format!(" = {numbers}"));
        }
    }
    text.push_str(&format!(" = {}", line.printed));
    if !line.unit.is_empty() {
        text.push_str(&format!(" {}", line.unit));
    }
    text
}

/// The section as plain text for copying.
fn plain_twin(section: &WorksheetSection, values: &Values) -> Markup {
    let lines: Vec<String> = section.lines.iter().map(|line| plain(line, values)).collect();
    html! {
        details {
            summary { "Plain text of this section" }
            pre { (lines.join("\n")) }
        }
    }
}
