//! What the joint allows: the band of press-in force between its extreme pairs.

use thiserror::Error;

use super::line_fit;
use super::trace::Point;
use crate::assembly::press::PressCurve;
use crate::findings::Findings;
use crate::material::Range;
use crate::tolerance::Extremes;

/// Why a joint gives no window.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Error)]
pub enum WindowError {
    /// Nothing grips.
    #[error("the joint does not grip even at its tightest pair: there is no press-in force to judge")]
    NoGrip,
}

/// The end of the engaged length that is left out of every judgement, as a share: there the part may meet its shoulder
/// (common practice, no source).
pub const JUDGED_TO: f64 = 0.98;
/// Where the mean of the end force begins, as a share of the engaged length.
pub const END_FROM: f64 = 0.93;
/// Part of the engaged length over which the slope is taken.
pub const SLOPE_OVER: (f64, f64) = (0.2, 0.9);

/// Force against travel from first touch, as corners joined by straight lines; m and N.
pub type Course = Vec<(f64, f64)>;

/// The band of press-in force, from the loosest pair at the low friction to the tightest at the high friction.
#[derive(Debug, Clone, PartialEq)]
pub struct Window {
    /// Loosest pair, low friction.
    pub lower: Course,
    /// Tightest pair, high friction.
    pub upper: Course,
    /// Diameter, m.
    pub diameter: f64,
    /// Engaged length, m.
    pub length: f64,
    /// Friction while pressing.
    pub friction: Range,
    /// Contact pressure of the pairs, Pa.
    pub pressure: Extremes<f64>,
    /// Interference that grips of the pairs, at 20 °C, m.
    pub interference: Extremes<f64>,
    /// Interference that acts at the tightest pair at the shop temperature, m.
    pub shop_interference: f64,
    /// Whether both parts were measured, so that the friction can be told from the pressure.
    pub measured: bool,
}

impl Window {
    /// The window of a joint; its travel counts from first touch.
    ///
    /// # Errors
    /// [`WindowError::NoGrip`] when even the tightest pair has no pressure.
    pub fn of(findings: &Findings) -> Result<Self, WindowError> {
        let joint = &findings.joint;
        let press = &findings.assembly.press;
        if press.tightest.peak_force <= 0.0 {
            return Err(WindowError::NoGrip);
        }
        let last = joint.last_interface();
        let pairs = findings.extremes.as_ref();
        Ok(Self {
            lower: course(&press.loosest),
            upper: course(&press.tightest),
            diameter: joint.interface_diameter(last),
            length: joint.engaged_length(),
            friction: joint.friction.pressing.value,
            pressure: pairs.map(|pair| pair.pressure),
            interference: pairs.map(|pair| pair.effective_interference),
            shop_interference: pairs.tightest.shop_interference,
            measured: joint.fits.get(last).is_some_and(|fit| fit.callout.starts_with("measured ")),
        })
    }

    /// Least force allowed at a travel, N.
    pub fn lower_at(&self, travel: f64) -> f64 {
        force_on(&self.lower, travel)
    }

    /// Greatest force allowed at a travel, N.
    pub fn upper_at(&self, travel: f64) -> f64 {
        force_on(&self.upper, travel)
    }

    /// Travel up to which a record is judged, m.
    pub fn judged_to(&self) -> f64 {
        JUDGED_TO * self.length
    }

    /// Greatest force allowed anywhere, N.
    pub fn top(&self) -> f64 {
        self.upper.iter().map(|point| point.1).fold(0.0, f64::max)
    }
}

fn course(curve: &PressCurve) -> Course {
    curve.points.iter().map(|point| (point.travel, point.force)).collect()
}

/// Force on a course at a travel; nothing before it begins, its last force behind its end.
pub(super) fn force_on(course: &[(f64, f64)], travel: f64) -> f64 {
    if travel <= 0.0 {
        return 0.0;
    }
    let after = course.partition_point(|point| point.0 < travel);
    match (after.checked_sub(1).and_then(|before| course.get(before)), course.get(after)) {
        (Some(a), Some(b)) if b.0 > a.0 => a.1 + (b.1 - a.1) * (travel - a.0) / (b.0 - a.0),
        (_, Some(b)) => b.1,
        (Some(a), None) => a.1,
        (None, None) => 0.0,
    }
}

/// Number of points that stand for a course where it is treated like a record.
const SAMPLES: u32 = 1000;

/// A course as a record would show it, up to the travel to which a record is judged.
pub(super) fn as_points(course: &[(f64, f64)], to: f64) -> Vec<Point> {
    (0..=SAMPLES)
        .map(|step| {
            let travel = to * f64::from(step) / f64::from(SAMPLES);
            let force = force_on(course, travel);
            Point { travel, force, least: force, greatest: force, rows: 1 }
        })
        .collect()
}

/// Travel at which the force begins to climb, m: the line through the points between 5 % and 30 % of the greatest force,
/// carried back to no force. None when the force never rises.
///
/// `top` (N) cuts off what lies far above the window, such as the knock against a shoulder. The shares are common
/// practice, no source; the same rule is applied to the window, so that what it makes of a chamfer falls out.
pub(super) fn climb_begins(points: &[Point], top: f64) -> Option<f64> {
    let greatest = points.iter().map(|point| point.force).fold(0.0, f64::max).min(top);
    if greatest <= 0.0 {
        return None;
    }
    let reaches = |share: f64| points.iter().position(|point| point.force >= share * greatest);
    let (from, to) = (reaches(0.05)?, reaches(0.3)?);
    let climbing: Vec<(f64, f64)> =
        points.get(from..=to)?.iter().map(|point| (point.travel, point.force)).collect();
    let first = climbing.first()?.0;
    match line_fit::line(&climbing) {
        Some(line) if line.slope > 0.0 => Some((-line.intercept / line.slope).min(first)),
        _ => Some(first),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_course_is_read_between_its_corners() {
        let course = [(0.0, 0.0), (1.0, 10.0), (3.0, 30.0)];
        assert_eq!(force_on(&course, -1.0), 0.0);
        assert_eq!(force_on(&course, 0.5), 5.0);
        assert_eq!(force_on(&course, 2.0), 20.0);
        assert_eq!(force_on(&course, 9.0), 30.0);
    }

    /// A straight climb from 2 mm on: the line goes back to 2 mm exactly.
    #[test]
    fn the_climb_is_carried_back_to_no_force() {
        let points: Vec<Point> = (0..200)
            .map(|row| {
                let travel = f64::from(row) * 1e-4;
                let force = (travel - 2e-3).max(0.0) * 1e6;
                Point { travel, force, least: force, greatest: force, rows: 1 }
            })
            .collect();
        assert!((climb_begins(&points, 1e9).unwrap() - 2e-3).abs() < 1e-12);
        assert!((climb_begins(&points, 5e3).unwrap() - 2e-3).abs() < 1e-12);
        assert_eq!(climb_begins(&[], 1.0), None);
    }
}
