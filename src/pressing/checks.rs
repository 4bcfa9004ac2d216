//! The checks a record is put to, with what they allow.

use super::line_fit::line;
use super::trace::{Point, gathered};
use super::window::{END_FROM, SLOPE_OVER, Window};

/// What is judged.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum CheckKind {
    /// Where the force begins to climb.
    Start,
    /// Whether the force stays between the curves of the extreme pairs.
    Course,
    /// Force for each length of travel.
    Slope,
    /// Greatest force before the seat.
    Peak,
    /// Force at the end of the travel.
    End,
    /// Slope towards the end against slope at the beginning.
    Steepening,
    /// Greatest fall of the force.
    Drop,
    /// Unrest of the force about its course.
    Ripple,
}

impl CheckKind {
    /// Its name in a table.
    pub fn name(self) -> &'static str {
        match self {
            Self::Start => "start of engagement",
            Self::Course => "outside the window by",
            Self::Slope => "slope",
            Self::Peak => "peak force",
            Self::End => "end force",
            Self::Steepening => "steepening",
            Self::Drop => "drop of force",
            Self::Ripple => "ripple",
        }
    }

    /// Its name in JSON.
    pub fn key(self) -> &'static str {
        match self {
            Self::Start => "start",
            Self::Course => "course",
            Self::Slope => "slope",
            Self::Peak => "peak",
            Self::End => "end",
            Self::Steepening => "steepening",
            Self::Drop => "drop",
            Self::Ripple => "ripple",
        }
    }

    /// Unit of its numbers.
    pub fn unit(self) -> CheckUnit {
        match self {
            Self::Start => CheckUnit::Travel,
            Self::Slope => CheckUnit::Slope,
            Self::Steepening => CheckUnit::Ratio,
            Self::Course | Self::Peak | Self::End | Self::Drop | Self::Ripple => CheckUnit::Force,
        }
    }
}

/// Unit of the numbers of a check, SI.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum CheckUnit {
    /// m.
    Travel,
    /// N.
    Force,
    /// N/m.
    Slope,
    /// A pure number.
    Ratio,
}

/// What a check allows.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Limit {
    /// Least; none when there is no lower limit.
    pub low: Option<f64>,
    /// Greatest.
    pub high: f64,
}

impl Limit {
    /// Whether a number is allowed.
    pub fn holds(&self, found: f64) -> bool {
        found <= self.high && self.low.is_none_or(|low| found >= low)
    }
}

/// One check with what was found.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Check {
    /// What is judged.
    pub kind: CheckKind,
    /// What was found; none when the record does not show it.
    pub found: Option<f64>,
    /// What is allowed.
    pub allowed: Limit,
    /// Where it was found: travel from first touch, m.
    pub at: Option<f64>,
}

impl Check {
    /// Whether it is met; what a record does not show is not met.
    pub fn ok(&self) -> bool {
        self.found.is_some_and(|found| self.allowed.holds(found))
    }
}

/// How far apart force readings may lie without being judged; each has its reason in [`super::judge::Settings`].
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Shares {
    pub(super) course: f64,
    pub(super) drop: f64,
    pub(super) ripple: f64,
    pub(super) steepening: f64,
}

/// Cells along the engaged length in which a curve is judged.
const CELLS: usize = 400;
/// Cells to each side of the moving mean that ripple is measured from: 2.5 % of the engaged length.
const BESIDE: usize = 10;

/// A record counted from first touch, in cells along the engaged length.
pub(super) struct Engaged<'a> {
    pub(super) window: &'a Window,
    pub(super) cells: Vec<Point>,
}

impl<'a> Engaged<'a> {
    /// The part of a curve from first touch to where it is judged.
    pub(super) fn new(window: &'a Window, from_touch: &[Point]) -> Self {
        Self { window, cells: gathered(from_touch, 0.0, window.judged_to(), CELLS) }
    }

    fn between(&self, from: f64, to: f64) -> impl Iterator<Item = &Point> {
        let length = self.window.length;
        self.cells.iter().filter(move |cell| cell.travel >= from * length && cell.travel <= to * length)
    }

    /// Whether the record reaches the end of what is judged, to within two cells.
    pub(super) fn reaches_end(&self) -> bool {
        self.cells.last().is_some_and(|cell| cell.travel >= 0.99 * self.window.judged_to())
    }

    /// Slope over the middle of the engaged length, N/m.
    pub(super) fn slope(&self) -> Option<f64> {
        self.slope_over(SLOPE_OVER.0, SLOPE_OVER.1)
    }

    fn slope_over(&self, from: f64, to: f64) -> Option<f64> {
        let points: Vec<(f64, f64)> = self.between(from, to).map(|cell| (cell.travel, cell.force)).collect();
        let covered = points.last()?.0 - points.first()?.0;
        if covered < 0.9 * (to - from) * self.window.length {
            return None;
        }
        line(&points).map(|line| line.slope)
    }

    pub(super) fn peak(&self) -> Option<(f64, f64)> {
        greatest(self.cells.iter().map(|cell| (cell.force, cell.travel)))
    }

    /// Mean force over the end of the engaged length, N; none when the record ends before.
    pub(super) fn end(&self) -> Option<f64> {
        if !self.reaches_end() {
            return None;
        }
        let (mut sum, mut count) = (0.0, 0.0);
        for cell in self.between(END_FROM, 1.0) {
            sum += cell.force;
            count += 1.0;
        }
        (count > 0.0).then(|| sum / count)
    }

    /// Slope over the last third against that over the first, each against the slope of the tightest pair there.
    pub(super) fn steepening(&self, tightest: &Self) -> Option<f64> {
        let relative = |from, to| Some(self.slope_over(from, to)? / tightest.slope_over(from, to)?);
        let (early, late): (f64, f64) = (relative(0.1, 0.4)?, relative(0.65, 0.97)?);
        (early > 0.0).then(|| late / early)
    }

    /// Greatest force outside the window, N, and where.
    pub(super) fn outside(&self) -> Option<(f64, f64)> {
        greatest(self.cells.iter().map(|cell| {
            let above = cell.force - self.window.upper_at(cell.travel);
            let below = self.window.lower_at(cell.travel) - cell.force;
            (above.max(below).max(0.0), cell.travel)
        }))
    }

    /// Greatest fall from the greatest force so far, N, and where it ends.
    pub(super) fn drop(&self) -> Option<(f64, f64)> {
        let mut highest = f64::NEG_INFINITY;
        greatest(self.cells.iter().map(|cell| {
            highest = highest.max(cell.force);
            (highest - cell.force, cell.travel)
        }))
    }

    /// Greatest spread of the readings about their moving mean within its width, N, and where.
    pub(super) fn ripple(&self) -> Option<(f64, f64)> {
        let cells = &self.cells;
        let width = 2 * BESIDE + 1;
        let unrest: Vec<(f64, f64, f64)> = cells
            .windows(width)
            .filter_map(|near| {
                let points: Vec<(f64, f64)> = near.iter().map(|cell| (cell.travel, cell.force)).collect();
                let line = line(&points)?;
                let cell = near.get(BESIDE)?;
                let mean = line.intercept + line.slope * cell.travel;
                Some((cell.least - mean, cell.greatest - mean, cell.travel))
            })
            .collect();
        greatest(unrest.windows(width.min(unrest.len().max(1))).filter_map(|near| {
            let least = near.iter().map(|cell| cell.0).fold(f64::INFINITY, f64::min);
            let most = near.iter().map(|cell| cell.1).fold(f64::NEG_INFINITY, f64::max);
            Some((most - least, near.get(near.len() / 2)?.2))
        }))
    }
}

fn greatest(values: impl Iterator<Item = (f64, f64)>) -> Option<(f64, f64)> {
    values.fold(None, |best: Option<(f64, f64)>, value| match best {
        Some(best) if best.0 >= value.0 => Some(best),
        _ => Some(value),
    })
}

/// The checks of an engaged curve; the start is judged where the record is counted from first touch.
pub(super) fn checks(
    record: &Engaged<'_>,
    lower: &Engaged<'_>,
    upper: &Engaged<'_>,
    shares: Shares,
) -> Vec<Check> {
    let check = |kind, found: Option<(f64, f64)>, low: Option<f64>, high: Option<f64>| Check {
        kind,
        found: found.map(|found| found.0),
        allowed: Limit { low, high: high.unwrap_or(0.0) },
        at: found.map(|found| found.1),
    };
    let plain = |kind, found: Option<f64>, low: Option<f64>, high: Option<f64>| Check {
        at: None,
        ..check(kind, found.map(|found| (found, 0.0)), low, high)
    };
    let first = |found: Option<(f64, f64)>| found.map(|found| found.0);
    let peak = record.peak();
    let of_peak = |share: f64| first(peak).map(|peak| share * peak.max(0.0));
    vec![
        check(CheckKind::Course, record.outside(), None, Some(shares.course * record.window.top())),
        plain(CheckKind::Slope, record.slope(), lower.slope(), upper.slope()),
        check(CheckKind::Peak, peak, first(lower.peak()), first(upper.peak())),
        plain(CheckKind::End, record.end(), lower.end(), upper.end()),
        plain(
            CheckKind::Steepening,
            record.steepening(upper),
            Some(1.0 / shares.steepening),
            Some(shares.steepening),
        ),
        check(CheckKind::Drop, record.drop(), None, of_peak(shares.drop)),
        check(CheckKind::Ripple, record.ripple(), None, of_peak(shares.ripple)),
    ]
}
