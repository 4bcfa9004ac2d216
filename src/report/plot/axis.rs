//! Axes: a range with round ticks, the quantity and its unit.

use std::ops::Range;

use plotters::coord::ranged1d::{DefaultFormatting, KeyPointHint, Ranged};

use crate::report::typeset;

/// One axis of a chart.
#[derive(Debug, Clone)]
pub(super) struct Axis {
    pub from: f64,
    pub to: f64,
    /// Place and lettering of each tick.
    pub ticks: Vec<(f64, String)>,
    /// Quantity and unit, such as `stress, MPa`.
    pub title: String,
}

impl Axis {
    /// An axis from `from` to `to` with about `count` round ticks.
    pub(super) fn new(from: f64, to: f64, count: usize, title: impl Into<String>) -> Self {
        let (from, to) = if to - from > 1e-9 * from.abs().max(to.abs()).max(1e-9) {
            (from, to)
        } else {
            (from - 1.0, to + 1.0)
        };
        Self { from, to, ticks: round_ticks(from, to, count), title: title.into() }
    }

    /// Share of the axis at `value`, 0 at its beginning.
    pub(super) fn share(&self, value: f64) -> f64 {
        (value - self.from) / (self.to - self.from)
    }
}

impl Ranged for Axis {
    type FormatOption = DefaultFormatting;
    type ValueType = f64;

    fn map(&self, value: &f64, limit: (i32, i32)) -> i32 {
        let (from, to) = (f64::from(limit.0), f64::from(limit.1));
        (from + self.share(*value) * (to - from)).round() as i32
    }

    fn key_points<Hint: KeyPointHint>(&self, _hint: Hint) -> Vec<f64> {
        self.ticks.iter().map(|(value, _)| *value).collect()
    }

    fn range(&self) -> Range<f64> {
        self.from..self.to
    }
}

/// Least and greatest of the finite values; 0 and 1 when there are none.
pub(super) fn bounds(values: impl IntoIterator<Item = f64>) -> (f64, f64) {
    let mut found = (f64::INFINITY, f64::NEG_INFINITY);
    for value in values.into_iter().filter(|value| value.is_finite()) {
        found = (found.0.min(value), found.1.max(value));
    }
    if found.0 <= found.1 { found } else { (0.0, 1.0) }
}

/// Multiples of 1, 2 or 5 times a power of ten within the range, with their lettering.
fn round_ticks(from: f64, to: f64, count: usize) -> Vec<(f64, String)> {
    let raw = (to - from) / count.max(1) as f64;
    let decade = 10f64.powf(raw.log10().floor());
    let step = [1.0, 2.0, 5.0, 10.0].map(|step| step * decade).into_iter().find(|step| *step >= raw * 0.999);
    let step = step.unwrap_or(raw);
    let decimals = (-step.log10().floor()).clamp(0.0, 9.0) as usize;
    let first = (from / step - 1e-9).ceil() as i64;
    let last = (to / step + 1e-9).floor() as i64;
    (first..=last.min(first + 50))
        .map(|number| number as f64 * step)
        .map(|value| (value, typeset::number(&format!("{:.decimals$}", value + 0.0))))
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn ticks_are_round_and_inside() {
        let axis = Axis::new(-37.0, 212.0, 6, "stress, MPa");
        let texts: Vec<&str> = axis.ticks.iter().map(|(_, text)| text.as_str()).collect();
        assert_eq!(texts, ["0", "50", "100", "150", "200"]);
        let fine = Axis::new(0.0, 0.0071, 5, "");
        assert_eq!(fine.ticks[1].1, "0.002");
        let negative = Axis::new(-3.0, -1.0, 4, "");
        assert_eq!(negative.ticks[0].1, "−3.0");
    }

    #[test]
    fn an_empty_range_is_opened() {
        let axis = Axis::new(5.0, 5.0, 5, "");
        assert!(axis.to > axis.from && axis.share(axis.from) == 0.0);
        assert_eq!(bounds([f64::NAN]), (0.0, 1.0));
    }
}
