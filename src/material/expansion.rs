//! Thermal expansion as a curve of total strain.

use std::sync::Arc;

use super::REFERENCE_TEMPERATURE;
use crate::numerics::interpolation::{InterpolationError, MonotoneCubic};

/// How far beyond an end of the curve a temperature still counts as the end, K.
const END_TOLERANCE: f64 = 1e-6;

/// Thermal expansion of a free part from 20 °C as a curve of total strain.
///
/// The argument is temperature in K, the value the strain (L − L₂₀)/L₂₀; it is zero at 293.15 K. It is
/// never extrapolated.
#[derive(Debug, Clone, PartialEq)]
pub struct Expansion {
    curve: MonotoneCubic,
    /// Where the curve comes from.
    pub source: Arc<str>,
    /// True when the curve is a single mean coefficient, not measured points.
    pub is_mean_coefficient: bool,
}

impl Expansion {
    /// A curve through (temperature K, strain) points that pass through zero at 293.15 K.
    ///
    /// # Errors
    /// As [`MonotoneCubic::new`].
    pub fn from_strains(
        points: &[(f64, f64)],
        source: impl Into<Arc<str>>,
    ) -> Result<Self, InterpolationError> {
        Ok(Self { curve: MonotoneCubic::new(points)?, source: source.into(), is_mean_coefficient: false })
    }

    /// One mean coefficient (1/K) for temperatures between `from` and `to` (K).
    ///
    /// # Errors
    /// As [`MonotoneCubic::new`].
    pub fn from_mean(
        coefficient: f64,
        from: f64,
        to: f64,
        source: impl Into<Arc<str>>,
    ) -> Result<Self, InterpolationError> {
        let strain = |t: f64| (t, coefficient * (t - REFERENCE_TEMPERATURE));
        let curve = MonotoneCubic::new(&[strain(from), strain(to)])?;
        Ok(Self { curve, source: source.into(), is_mean_coefficient: true })
    }

    /// Strain of a free part at `temperature` (K), zero at 293.15 K.
    ///
    /// A millionth of a kelvin beyond an end counts as the end, so that a temperature converted from degrees
    /// Celsius or Fahrenheit does not fall outside by its last digit.
    ///
    /// # Errors
    /// Outside the curve's range: nothing is extrapolated.
    ///
    /// # Example
    /// ```
    /// use hubgrip::material::Expansion;
    /// let steel = Expansion::from_mean(12e-6, 273.15, 573.15, "invented")?;
    /// assert!((steel.strain(393.15)? - 1.2e-3).abs() < 1e-15);
    /// assert!(steel.strain(600.0).is_err());
    /// # Ok::<(), hubgrip::numerics::interpolation::InterpolationError>(())
    /// ```
    pub fn strain(&self, temperature: f64) -> Result<f64, InterpolationError> {
        if temperature == REFERENCE_TEMPERATURE {
            return Ok(0.0);
        }
        let (from, to) = self.curve.range();
        let at_end = [from, to].into_iter().find(|end| (temperature - end).abs() <= END_TOLERANCE);
        self.curve.value(at_end.unwrap_or(temperature))
    }

    /// Lowest and highest temperature of the curve, K.
    pub fn range(&self) -> (f64, f64) {
        self.curve.range()
    }

    /// Mean coefficient between 20 °C and `temperature` (K), 1/K.
    ///
    /// # Errors
    /// Outside the curve's range. Within 1 K of 20 °C the slope over that kelvin is given.
    pub fn mean_coefficient(&self, temperature: f64) -> Result<f64, InterpolationError> {
        let difference = temperature - REFERENCE_TEMPERATURE;
        if difference.abs() < 1.0 {
            let (low, high) = (REFERENCE_TEMPERATURE - 1.0, REFERENCE_TEMPERATURE + 1.0);
            return Ok((self.curve.value(high)? - self.curve.value(low)?) / 2.0);
        }
        Ok(self.strain(temperature)? / difference)
    }

    /// The points of the curve, (K, strain).
    pub fn points(&self) -> &[(f64, f64)] {
        self.curve.points()
    }
}
