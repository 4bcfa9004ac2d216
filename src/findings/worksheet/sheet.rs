//! The sheet that a worksheet is written on: every line is worked from the printed values above it.

use std::collections::BTreeMap;

use super::super::expression::{Expression, Symbol};
use super::super::{WorksheetLine, WorksheetSection};
use crate::quantity::number;

/// Significant digits of a printed result.
const DIGITS: usize = 6;

/// Digits to which a hand calculation from printed values follows the program (rounding of the lines
/// above it adds up; half a unit in the sixth digit each).
const AGREEMENT: f64 = 5e-5;

/// Share by which rounding to the printed digits may change a number: half a unit in the sixth digit of 1.00000.
const ROUNDING: f64 = 5e-6;

/// Lines in the making. A symbol is defined once and keeps its printed value.
pub(super) struct Sheet {
    sections: Vec<WorksheetSection>,
    printed: BTreeMap<Symbol, String>,
    /// How far the printed value of a symbol may lie from the program's, by rounding of the lines above it.
    slack: BTreeMap<Symbol, f64>,
    drifts: Vec<String>,
}

impl Sheet {
    pub(super) fn new() -> Self {
        let printed = BTreeMap::from([(Symbol::new("pi"), std::f64::consts::PI.to_string())]);
        Self { sections: Vec::new(), printed, slack: BTreeMap::new(), drifts: Vec::new() }
    }

    /// Starts a section; the lines that follow belong to it.
    pub(super) fn section(&mut self, title: impl Into<String>) {
        self.sections.push(WorksheetSection { title: title.into(), lines: Vec::new() });
    }

    /// The first of these symbols that has been written; the last of them when none has.
    pub(super) fn first_of(&self, symbols: &[&str]) -> String {
        let known = symbols.iter().find(|symbol| self.printed.contains_key(&Symbol::new(symbol)));
        known.or(symbols.last()).map(|symbol| (*symbol).to_owned()).unwrap_or_default()
    }

    /// An input: a symbol with its value, written to six significant digits.
    pub(super) fn input(&mut self, symbol: &str, meaning: &str, value: f64, unit: &str, source: &str) {
        let printed = number(value, DIGITS);
        self.slack.insert(Symbol::new(symbol), ROUNDING * value.abs());
        self.push(symbol, meaning, None, printed, unit, source);
    }

    /// Whether a symbol has a value.
    pub(super) fn has(&self, symbol: &str) -> bool {
        self.printed.contains_key(&Symbol::new(symbol))
    }

    /// A formula, worked from the printed values of its symbols; `program` is the program's own figure,
    /// in the printed unit, that the result must agree with.
    pub(super) fn formula(
        &mut self,
        symbol: &str,
        meaning: &str,
        formula: Expression,
        unit: &str,
        source: &str,
        program: Option<f64>,
    ) {
        let value = formula.evaluate(&|symbol| self.printed.get(symbol)?.parse().ok());
        let printed = match value {
            Some(value) if value.is_finite() => number(value, DIGITS),
            _ => {
                self.drifts.push(format!("{symbol}: no value for {}", formula.plain()));
                return;
            }
        };
        let worked = printed.parse::<f64>().unwrap_or(f64::NAN);
        let agrees = |allowed: f64| program.is_none_or(|program| (worked - program).abs() <= allowed);
        let mut slack = AGREEMENT * program.map_or(0.0, f64::abs);
        // A difference of nearly equal numbers keeps fewer digits than its terms were printed with.
        if program.is_none() || !agrees(slack) {
            slack = slack.max(self.rounding(&formula) + ROUNDING * worked.abs());
        }
        if let Some(program) = program.filter(|_| !agrees(slack)) {
            self.drifts.push(format!("{symbol}: worked by hand {worked}, by the program {program}"));
        }
        self.slack.insert(Symbol::new(symbol), slack);
        self.push(symbol, meaning, Some(formula), printed, unit, source);
    }

    /// How far rounding of its symbols may move the result of a formula: the sum of what each moves alone.
    fn rounding(&self, formula: &Expression) -> f64 {
        let value = |moved: Option<(&Symbol, f64)>| {
            formula.evaluate(&|symbol| {
                let printed: f64 = self.printed.get(symbol)?.parse().ok()?;
                Some(moved.filter(|(name, _)| *name == symbol).map_or(printed, |(_, by)| printed + by))
            })
        };
        let Some(own) = value(None) else { return 0.0 };
        let by = |symbol: &Symbol| {
            let slack = self.slack.get(symbol).copied().unwrap_or(0.0);
            let moved = |by: f64| value(Some((symbol, by))).map_or(0.0, |moved| (moved - own).abs());
            moved(slack).max(moved(-slack))
        };
        formula.symbols().iter().map(by).sum()
    }

    fn push(
        &mut self,
        symbol: &str,
        meaning: &str,
        formula: Option<Expression>,
        printed: String,
        unit: &str,
        source: &str,
    ) {
        let symbol = Symbol::new(symbol);
        if self.printed.insert(symbol.clone(), printed.clone()).is_some() {
            self.drifts.push(format!("{} is defined twice", symbol.plain()));
        }
        let line = WorksheetLine {
            symbol,
            meaning: meaning.to_owned(),
            formula,
            printed,
            unit: unit.to_owned(),
            source: source.to_owned(),
        };
        if let Some(section) = self.sections.last_mut() {
            section.lines.push(line);
        }
    }

    /// The sections, and what did not agree with the program.
    pub(super) fn finish(self) -> (Vec<WorksheetSection>, Vec<String>) {
        (self.sections, self.drifts)
    }
}
