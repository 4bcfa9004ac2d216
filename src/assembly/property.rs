//! A material property that is constant or follows a curve over temperature, with its integral.

use super::error::{AssemblyError, positive};
use crate::numerics::interpolation::MonotoneCubic;

/// A property against temperature: conductivity W/(m·K) or specific heat J/(kg·K).
#[derive(Debug, Clone, PartialEq)]
pub enum Property {
    /// The same at every temperature.
    Constant(f64),
    /// A curve over temperature in K; never extrapolated.
    Curve(PropertyCurve),
}

/// A property curve with the running integral at its points.
#[derive(Debug, Clone, PartialEq)]
pub struct PropertyCurve {
    curve: MonotoneCubic,
    /// Integral of the property from the first point to each point.
    integral: Vec<f64>,
}

impl Property {
    /// A constant property greater than zero.
    ///
    /// # Errors
    /// [`AssemblyError::OutsideRange`].
    pub fn constant(value: f64) -> Result<Self, AssemblyError> {
        Ok(Self::Constant(positive("material property", value)?))
    }

    /// A property through (temperature K, value) points with rising temperatures and values above zero.
    ///
    /// # Errors
    /// [`AssemblyError::Table`] or [`AssemblyError::OutsideRange`].
    pub fn curve(points: &[(f64, f64)]) -> Result<Self, AssemblyError> {
        let curve = MonotoneCubic::new(points)?;
        for (_, value) in points {
            positive("material property", *value)?;
        }
        let mut integral = vec![0.0];
        for pair in points.windows(2) {
            let before = integral[integral.len() - 1];
            integral.push(before + simpson(&curve, pair[0].0, pair[1].0));
        }
        Ok(Self::Curve(PropertyCurve { curve, integral }))
    }

    /// Value at `temperature` (K).
    ///
    /// # Errors
    /// [`AssemblyError::Table`] outside the curve.
    pub fn value(&self, temperature: f64) -> Result<f64, AssemblyError> {
        match self {
            Self::Constant(value) => Ok(*value),
            Self::Curve(property) => Ok(property.curve.value(temperature)?),
        }
    }

    /// Integral of the property over temperature from `from` to `to` (K).
    ///
    /// For a specific heat it is the heat that a kilogram takes up, J/kg.
    ///
    /// # Errors
    /// [`AssemblyError::Table`] outside the curve.
    ///
    /// # Example
    /// ```
    /// use hubgrip::assembly::property::Property;
    /// let rising = Property::curve(&[(100.0, 200.0), (300.0, 400.0)]).unwrap();
    /// assert!((rising.integral(100.0, 300.0).unwrap() - 60_000.0).abs() < 1e-9);
    /// ```
    pub fn integral(&self, from: f64, to: f64) -> Result<f64, AssemblyError> {
        match self {
            Self::Constant(value) => Ok(value * (to - from)),
            Self::Curve(property) => Ok(property.up_to(to)? - property.up_to(from)?),
        }
    }

    /// Whether the property is known over the whole span between two temperatures.
    ///
    /// # Errors
    /// [`AssemblyError::Table`] when it is not.
    pub(crate) fn covers(&self, one: f64, other: f64) -> Result<(), AssemblyError> {
        self.value(one)?;
        self.value(other)?;
        Ok(())
    }

    /// Value with the temperature held inside the curve, for iterates of a solution that itself stays inside.
    pub(crate) fn value_held(&self, temperature: f64) -> f64 {
        match self {
            Self::Constant(value) => *value,
            Self::Curve(property) => property.held(temperature),
        }
    }

    /// Integral from a fixed start, with the end values continued outside the curve, as [`Self::value_held`].
    pub(crate) fn content(&self, temperature: f64) -> f64 {
        match self {
            Self::Constant(value) => value * temperature,
            Self::Curve(property) => {
                let (from, to) = property.curve.range();
                let inside = temperature.clamp(from, to);
                let content = property.up_to(inside).unwrap_or(f64::NAN);
                if inside == temperature {
                    return content;
                }
                content + property.held(temperature) * (temperature - inside)
            }
        }
    }
}

impl PropertyCurve {
    fn held(&self, temperature: f64) -> f64 {
        let (from, to) = self.curve.range();
        self.curve.value(temperature.clamp(from, to)).unwrap_or(f64::NAN)
    }

    fn up_to(&self, temperature: f64) -> Result<f64, AssemblyError> {
        let (piece, from_its_start) = self.curve.integral_in_piece(temperature)?;
        Ok(self.integral[piece] + from_its_start)
    }
}

/// Simpson's rule, exact for the cubic between two neighbouring points.
fn simpson(curve: &MonotoneCubic, from: f64, to: f64) -> f64 {
    let value = |t| curve.value(t).unwrap_or(f64::NAN);
    (to - from) / 6.0 * (value(from) + 4.0 * value(0.5 * (from + to)) + value(to))
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    #[test]
    fn integral_is_that_of_the_curve_between_its_points() {
        let points: Vec<(f64, f64)> =
            [77.0, 120.0, 200.0, 300.0].iter().map(|t: &f64| (*t, 100.0 + t.sqrt())).collect();
        let property = Property::curve(&points).unwrap();
        let steps = 200_000;
        let width = (290.0 - 80.0) / f64::from(steps);
        let sum: f64 =
            (0..steps).map(|i| property.value(80.0 + (f64::from(i) + 0.5) * width).unwrap() * width).sum();
        assert_relative_eq!(property.integral(80.0, 290.0).unwrap(), sum, max_relative = 1e-9);
        assert_relative_eq!(property.content(290.0) - property.content(80.0), sum, max_relative = 1e-9);
    }

    #[test]
    fn nothing_is_extrapolated() {
        let property = Property::curve(&[(77.0, 150.0), (300.0, 460.0)]).unwrap();
        assert!(property.value(301.0).is_err());
        assert!(property.integral(60.0, 200.0).is_err());
        assert!(Property::curve(&[(77.0, 150.0), (300.0, 0.0)]).is_err());
        assert!(Property::constant(-1.0).is_err());
    }
}
