//! Contact pressure against interference, for a plot.

use super::hub::HubLimitKind;
use super::joint::PlasticJoint;
use crate::mechanics::error::MechanicsError;
use crate::mechanics::ring::check;

/// One point of the curve.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct CurvePoint {
    /// Diametral interference, m.
    pub interference: f64,
    /// Contact pressure, Pa.
    pub pressure: f64,
    /// Plastic zone over joint diameter; 1 up to the onset.
    pub plastic_ratio: f64,
}

/// What the curve ends at.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum CurveEnd {
    /// The hub is fully plastic.
    FullyPlastic,
    /// The pressure cap of a thick hub.
    PressureCap,
    /// The shaft begins to yield; a plastic shaft is not covered.
    ShaftYields,
}

/// Contact pressure against interference.
#[derive(Debug, Clone, PartialEq)]
pub struct PressureCurve {
    /// From no interference on, rising; the second point is the onset of yield unless the shaft yields before.
    pub points: Vec<CurvePoint>,
    /// What the last point is.
    pub end: CurveEnd,
}

impl PlasticJoint {
    /// The pressure curve: a straight line to the onset of yield, then `count` points to the limit pressure.
    ///
    /// The points are evenly spaced in the plastic zone's diameter. The curve ends early where the shaft yields.
    ///
    /// # Errors
    /// Fewer than two points.
    pub fn pressure_curve(&self, count: usize) -> Result<PressureCurve, MechanicsError> {
        check("number of points", count as f64, "2 or more", count >= 2)?;
        let limits = self.limits();
        let start = CurvePoint { interference: 0.0, pressure: 0.0, plastic_ratio: 1.0 };
        if let Some(interference) = limits.shaft_yield_interference
            && limits.shaft_limit <= limits.onset_pressure
        {
            let last = CurvePoint { interference, pressure: limits.shaft_limit, plastic_ratio: 1.0 };
            return Ok(PressureCurve { points: vec![start, last], end: CurveEnd::ShaftYields });
        }
        let (last, end) = match (limits.shaft_yield_interference, limits.limit_kind) {
            (Some(_), _) => (self.hub.plastic_ratio(limits.shaft_limit)?, CurveEnd::ShaftYields),
            (None, HubLimitKind::FullyPlastic) => (limits.limit_plastic_ratio, CurveEnd::FullyPlastic),
            (None, HubLimitKind::PressureCap) => (limits.limit_plastic_ratio, CurveEnd::PressureCap),
        };
        let mut points = vec![start];
        for index in 0..count {
            let plastic_ratio = 1.0 + (last - 1.0) * index as f64 / (count - 1) as f64;
            points.push(CurvePoint {
                interference: self.interference_at(plastic_ratio)?,
                pressure: self.hub.pressure(plastic_ratio)?,
                plastic_ratio,
            });
        }
        Ok(PressureCurve { points, end })
    }
}
