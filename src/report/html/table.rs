//! Cells and tables: numbers aligned at the decimal point, headers with scope.

use maud::{Markup, html};

use super::Sheet;
use crate::material::Range;
use crate::quantity::{factor_found, factor_required};
use crate::report::typeset::{at_point, number};
use crate::report::units::{Measure, Units};

/// What stands where a number does not exist.
pub(super) const NONE: &str = "–";

/// A number in a cell, aligned with its neighbours at the decimal point.
pub(super) fn aligned(text: &str) -> Markup {
    let (whole, fraction) = at_point(text);
    html! { td.n { span.w { (whole) } span.f { (fraction) } } }
}

/// A cell with a number without its unit; the unit stands in the head or in a column of its own.
pub(super) fn cell(units: Units, measure: Measure, value: Option<f64>) -> Markup {
    match value {
        Some(value) => aligned(&units.reading(measure, value).number),
        None => html! { td.n { span.w { (NONE) } span.f {} } },
    }
}

/// A cell with both ends of a range.
pub(super) fn range_cell(units: Units, measure: Measure, range: Range) -> Markup {
    html! { td.n { (range_text(units, measure, range)) } }
}

/// `low to high`, or one number when both read alike.
pub(super) fn range_text(units: Units, measure: Measure, range: Range) -> String {
    let (low, high) = (units.reading(measure, range.low).number, units.reading(measure, range.high).number);
    if low == high { low } else { format!("{low} to {high}") }
}

/// A safety factor that was found.
pub(super) fn safety(value: f64) -> String {
    number(&factor_found(value))
}

/// A safety factor that is required.
pub(super) fn safety_required(value: f64) -> String {
    number(&factor_required(value))
}

/// A table that scrolls inside itself on a narrow screen.
pub(super) fn scrolling(label: &str, class: &str, table: &Markup) -> Markup {
    html! {
        div.scroll tabindex="0" role="region" aria-label=(label) {
            table class=(class) { (table) }
        }
    }
}

/// Column heads of the three pairs with the mark each carries in every picture.
pub(super) fn pair_heads(_sheet: Sheet) -> Markup {
    html! {
        th.n scope="col" { span.loosest { "○ loosest" } }
        th.n scope="col" { "mean" }
        th.n scope="col" { span.tightest { "● tightest" } }
    }
}
