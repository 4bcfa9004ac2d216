//! The worksheet cannot drift from the code.
//!
//! Every printed formula is parsed and worked by an independent expression evaluator (the crate exmex)
//! from the printed values of its symbols; the result, printed to the same digits, must equal the printed
//! result to its last digit. The sheet itself compares each result with the program's own figure.

mod common;

use std::collections::BTreeMap;

use exmex::prelude::*;
use hubgrip::findings::worksheet;
use hubgrip::quantity::number;

/// Digits to which a worksheet prints.
const DIGITS: usize = 6;

#[test]
fn every_formula_of_every_example_gives_its_printed_result() {
    let mut formulas = 0;
    for path in common::examples() {
        let findings = common::findings(&path);
        let mut printed: BTreeMap<String, f64> = BTreeMap::from([("pi".to_owned(), std::f64::consts::PI)]);
        for line in findings.worksheet.iter().flat_map(|section| &section.lines) {
            if let Some(formula) = &line.formula {
                let text = formula.plain();
                let parsed = exmex::parse::<f64>(&text)
                    .unwrap_or_else(|error| panic!("{}: {text}: {error}", path.display()));
                let values: Vec<f64> = parsed
                    .var_names()
                    .iter()
                    .map(|name| {
                        *printed.get(name).unwrap_or_else(|| panic!("{text}: {name} has no printed value"))
                    })
                    .collect();
                let worked = parsed.eval(&values).expect("the formula can be worked");
                assert_eq!(
                    number(worked, DIGITS),
                    line.printed,
                    "{}: {} = {text}",
                    path.display(),
                    line.symbol.plain()
                );
                formulas += 1;
            }
            printed.insert(line.symbol.plain(), line.printed.parse().expect("a printed value is a number"));
        }
    }
    assert!(formulas > 150, "only {formulas} formulas were worked");
    println!("{formulas} formulas worked");
}

#[test]
fn every_line_agrees_with_the_programs_own_figure() {
    for path in common::examples() {
        let (_, drifts) = worksheet::worked(&common::findings(&path));
        assert!(drifts.is_empty(), "{}: {drifts:#?}", path.display());
    }
}
