//! A record judged: the checks, what they tell, and what is inferred.

use super::checks::{self, Check, CheckKind, Engaged, Limit, Shares};
use super::inference::{Inferred, infer};
use super::read::Record;
use super::trace::{Point, gathered};
use super::window::{Window, as_points, climb_begins};

/// What is allowed besides the window itself; lengths m, shares of 1.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Settings {
    /// Travel of the record at which the parts are to touch, m.
    pub touch_at: f64,
    /// How far the first touch may lie from there, m.
    pub touch_within: f64,
    /// Uncertainty of the force as a share of the reading; the same share of the top of the window is allowed outside it.
    pub force_uncertainty: f64,
    /// Greatest fall of the force, as a share of the peak.
    pub drop: f64,
    /// Greatest ripple from trough to crest, as a share of the peak.
    pub ripple: f64,
    /// Greatest ratio of the slope at the end to that at the beginning; its inverse is the least.
    pub steepening: f64,
}

impl Default for Settings {
    /// Touch at 0 within 1 mm; force to 1 % (a force channel of class 1, ISO 7500-1, from memory); drop 5 %, ripple 5 %,
    /// steepening 1.5 (common practice, no source).
    fn default() -> Self {
        Self {
            touch_at: 0.0,
            touch_within: 1e-3,
            force_uncertainty: 0.01,
            drop: 0.05,
            ripple: 0.05,
            steepening: 1.5,
        }
    }
}

/// A record with its verdict.
#[derive(Debug, Clone, PartialEq)]
pub struct Judged {
    /// Travel of the record at first touch, m; none when the force never climbs.
    pub touch: Option<f64>,
    /// Travel from first touch to the end of the record, m.
    pub reach: f64,
    /// The checks in a fixed order.
    pub checks: Vec<Check>,
    /// What the checks that are not met tell of; full sentences.
    pub tells: Vec<String>,
    /// Friction and interference; none when the record does not show a steady climb.
    pub inferred: Option<Inferred>,
    /// The curve from first touch on for a picture; at most [`SHOWN`] points.
    pub shown: Vec<Point>,
}

impl Judged {
    /// Whether every check is met.
    pub fn ok(&self) -> bool {
        self.checks.iter().all(Check::ok)
    }

    /// The check of a kind.
    pub fn check(&self, kind: CheckKind) -> Option<&Check> {
        self.checks.iter().find(|check| check.kind == kind)
    }
}

/// Most points of a curve for a picture.
pub const SHOWN: usize = 300;

/// Checks that must be met before friction and interference are inferred: both must stay the same along the travel.
const STEADY: [CheckKind; 2] = [CheckKind::Steepening, CheckKind::Drop];

/// Judges a record.
///
/// The first touch is where the climb of the force, carried back, begins, less what the same rule finds on the window's own
/// curves: the chamfer shifts it by some hundredths of a millimetre, between that of the lower and that of the upper curve as the
/// slope lies between theirs. From there the record is laid over the window; the last 2 % of the engaged length and all beyond are not judged,
/// as there the part may meet its shoulder.
pub fn judge(window: &Window, record: &Record, settings: &Settings) -> Judged {
    let judged_to = window.judged_to();
    let (lower_points, upper_points) =
        (as_points(&window.lower, judged_to), as_points(&window.upper, judged_to));
    let (lower, upper) = (Engaged::new(window, &lower_points), Engaged::new(window, &upper_points));
    let begins = climb_begins(&record.points, window.top());
    let touch = begins.map(|begins| {
        let slope = Engaged::new(window, &from(&record.points, begins)).slope();
        let between = share_between(slope, lower.slope(), upper.slope());
        let bias = |points: &[Point]| climb_begins(points, window.top()).unwrap_or(0.0);
        begins - (1.0 - between) * bias(&lower_points) - between * bias(&upper_points)
    });
    let from_touch = from(&record.points, touch.unwrap_or(settings.touch_at));
    let engaged = Engaged::new(window, &from_touch);
    let shares = Shares {
        course: settings.force_uncertainty,
        drop: settings.drop,
        ripple: settings.ripple,
        steepening: settings.steepening,
    };
    let mut all = vec![start(touch, settings)];
    all.extend(checks::checks(&engaged, &lower, &upper, shares));
    let reach = from_touch.last().map_or(0.0, |point| point.travel);
    let steady = all.iter().all(|check| !STEADY.contains(&check.kind) || check.ok());
    let tells = tells(&all, window, reach);
    let least = from_touch.first().map_or(0.0, |point| point.travel);
    Judged {
        touch,
        reach,
        tells,
        checks: all,
        inferred: infer(window, &from_touch, settings.force_uncertainty).filter(|_| steady),
        shown: gathered(&from_touch, least, reach, SHOWN),
    }
}

/// A curve counted from another travel.
fn from(points: &[Point], origin: f64) -> Vec<Point> {
    points.iter().map(|point| Point { travel: point.travel - origin, ..*point }).collect()
}

/// Where a number lies between two others, 0 to 1; the middle when it is not known.
fn share_between(value: Option<f64>, low: Option<f64>, high: Option<f64>) -> f64 {
    match (value, low, high) {
        (Some(value), Some(low), Some(high)) if high > low => ((value - low) / (high - low)).clamp(0.0, 1.0),
        _ => 0.5,
    }
}

fn start(touch: Option<f64>, settings: &Settings) -> Check {
    let (at, within) = (settings.touch_at, settings.touch_within);
    Check {
        kind: CheckKind::Start,
        found: touch,
        allowed: Limit { low: Some(at - within), high: at + within },
        at: touch.map(|_| 0.0),
    }
}

/// What the checks that are not met tell of, the likeliest first.
fn tells(checks: &[Check], window: &Window, reach: f64) -> Vec<String> {
    let side = |kind: CheckKind| -> Side {
        checks.iter().find(|check| check.kind == kind).map_or(Side::Within, Side::of)
    };
    let place = |kind: CheckKind| {
        checks.iter().find(|check| check.kind == kind && !check.ok()).and_then(|check| check.at)
    };
    let early = |kind: CheckKind| place(kind).is_some_and(|at| at < window.length / 3.0);
    let mut told: Vec<&str> = Vec::new();
    match side(CheckKind::Start) {
        Side::Missing => {
            told.push("The force never climbs: no part was pressed, or the force has the wrong sign.")
        }
        Side::Above => told.push("The parts touch late: a part is short, not in place, or another one."),
        Side::Below => told.push("The parts touch early: a part is long, not in place, or has a burr."),
        Side::Within => {}
    }
    let drops = side(CheckKind::Drop) == Side::Above;
    let ripples = side(CheckKind::Ripple) == Side::Above;
    let hump = drops && (early(CheckKind::Drop) || early(CheckKind::Course));
    if hump {
        told.push("A hump that falls again soon after the entry tells of a part that entered askew, or of a burr or a scraping edge.");
    } else if drops {
        told.push("A fall of the force on the way tells of galling that lets go, or of a part that cracks.");
    }
    if ripples && !hump {
        told.push("Ripple tells of stick-slip, the first step to galling: look at lubricant and speed.");
    }
    match side(CheckKind::Steepening) {
        Side::Above => told.push(
            "A climb that steepens on the way tells of galling: the friction grows while the parts slide.",
        ),
        Side::Below if !drops => {
            told.push("A climb that flattens tells of a taper, a part that yields or lubricant that gets in.")
        }
        _ => {}
    }
    let (slope, end) = (side(CheckKind::Slope), side(CheckKind::End));
    if end == Side::Missing && reach < window.judged_to() {
        told.push("The record ends before the part is seated.");
    }
    let steady = side(CheckKind::Steepening) == Side::Within && !drops;
    if steady && (slope == Side::Below || end == Side::Below) {
        told.push("A force too low throughout tells of too little interference or too slippery a seat: it may slip in service.");
    }
    if steady && (slope == Side::Above || end == Side::Above) {
        told.push("A force too high throughout tells of too much interference or a dry or rough seat: a part may have yielded.");
    }
    if told.is_empty() && checks.iter().any(|check| !check.ok()) {
        told.push("The force leaves the window without one of the usual signs: look at the curve.");
    }
    told.into_iter().map(str::to_owned).collect()
}

/// On which side of its limits a check lies.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
enum Side {
    Within,
    Below,
    Above,
    Missing,
}

impl Side {
    fn of(check: &Check) -> Self {
        match check.found {
            None => Self::Missing,
            Some(found) if found > check.allowed.high => Self::Above,
            Some(_) if check.ok() => Self::Within,
            Some(_) => Self::Below,
        }
    }
}
