//! Young's modulus against temperature.

use std::sync::Arc;

use super::REFERENCE_TEMPERATURE;
use crate::numerics::interpolation::{InterpolationError, MonotoneCubic};

/// How far beyond an end of the curve a temperature still counts as the end, K.
const END_TOLERANCE: f64 = 1e-6;

/// Young's modulus against temperature, as its ratio to the modulus at 20 °C.
///
/// The argument is temperature in K, the value E(T)/E(20 °C); it is one at 293.15 K. It is never extrapolated. The
/// modulus is that of a quick load: creep is no part of it.
#[derive(Debug, Clone, PartialEq)]
pub struct ModulusCurve {
    curve: MonotoneCubic,
    /// Where the curve comes from.
    pub source: Arc<str>,
}

impl ModulusCurve {
    /// A curve through (temperature K, modulus) points in any unit; their own value at 293.15 K becomes the unit.
    ///
    /// # Errors
    /// As [`MonotoneCubic::new`]; points that do not reach 293.15 K.
    ///
    /// # Example
    /// ```
    /// use hubgrip::material::ModulusCurve;
    /// let steel = ModulusCurve::from_points(&[(293.15, 210e9), (373.15, 207e9), (473.15, 199e9)], "invented")?;
    /// assert!((steel.ratio(373.15)? - 207.0 / 210.0).abs() < 1e-15);
    /// assert_eq!(steel.ratio(293.15)?, 1.0);
    /// assert!(steel.ratio(500.0).is_err());
    /// # Ok::<(), hubgrip::numerics::interpolation::InterpolationError>(())
    /// ```
    pub fn from_points(
        points: &[(f64, f64)],
        source: impl Into<Arc<str>>,
    ) -> Result<Self, InterpolationError> {
        let reference = MonotoneCubic::new(points)?.value(REFERENCE_TEMPERATURE)?;
        let mut ratios: Vec<(f64, f64)> =
            points.iter().map(|&(kelvin, modulus)| (kelvin, modulus / reference)).collect();
        let place = ratios.partition_point(|point| point.0 < REFERENCE_TEMPERATURE);
        if ratios.get(place).is_none_or(|point| point.0 > REFERENCE_TEMPERATURE) {
            ratios.insert(place, (REFERENCE_TEMPERATURE, 1.0));
        }
        Ok(Self { curve: MonotoneCubic::new(&ratios)?, source: source.into() })
    }

    /// Modulus at `temperature` (K) over that at 293.15 K.
    ///
    /// A millionth of a kelvin beyond an end counts as the end, so that a temperature converted from degrees
    /// Celsius or Fahrenheit does not fall outside by its last digit.
    ///
    /// # Errors
    /// Outside the curve's range: nothing is extrapolated.
    pub fn ratio(&self, temperature: f64) -> Result<f64, InterpolationError> {
        if temperature == REFERENCE_TEMPERATURE {
            return Ok(1.0);
        }
        let (from, to) = self.curve.range();
        let at_end = [from, to].into_iter().find(|end| (temperature - end).abs() <= END_TOLERANCE);
        self.curve.value(at_end.unwrap_or(temperature))
    }

    /// Lowest and highest temperature of the curve, K.
    pub fn range(&self) -> (f64, f64) {
        self.curve.range()
    }

    /// The points of the curve, (K, ratio).
    pub fn points(&self) -> &[(f64, f64)] {
        self.curve.points()
    }
}
