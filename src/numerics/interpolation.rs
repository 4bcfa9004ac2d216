//! Interpolation in a table with rising arguments, refused outside the table.

use thiserror::Error;

/// Why a table could not be built or read.
#[derive(Debug, Clone, Copy, PartialEq, Error)]
pub enum InterpolationError {
    /// Fewer than two points.
    #[error("a table needs at least two points, this one has {0}")]
    TooFewPoints(usize),
    /// Arguments must rise from point to point.
    #[error("the arguments of a table must rise: {before} is followed by {after}")]
    NotRising {
        /// The earlier argument.
        before: f64,
        /// The one after it, which is not greater.
        after: f64,
    },
    /// A value or argument is not a finite number.
    #[error("the table holds a number that is not finite")]
    NotFinite,
    /// The argument lies outside the table.
    #[error("{given} is outside the table, which runs from {from} to {to}")]
    Outside {
        /// First argument of the table.
        from: f64,
        /// Last argument of the table.
        to: f64,
        /// The argument asked for.
        given: f64,
    },
}

/// Monotone piecewise cubic through a table: it keeps every rise and fall of the data and adds none.
///
/// Source: F. N. Fritsch and R. E. Carlson, *Monotone Piecewise Cubic Interpolation*, SIAM Journal on
/// Numerical Analysis 17 (1980) 238–246; slopes by the weighted harmonic mean of F. N. Fritsch and
/// J. Butland, SIAM Journal on Scientific and Statistical Computing 5 (1984) 300–304.
///
/// # Example
/// ```
/// use hubgrip::numerics::interpolation::MonotoneCubic;
/// let curve = MonotoneCubic::new(&[(0.0, 0.0), (1.0, 1.0), (2.0, 4.0)]).unwrap();
/// assert_eq!(curve.value(1.0).unwrap(), 1.0);
/// assert!(curve.value(2.5).is_err());
/// ```
#[derive(Debug, Clone, PartialEq)]
pub struct MonotoneCubic {
    points: Vec<(f64, f64)>,
    slopes: Vec<f64>,
}

impl MonotoneCubic {
    /// Builds the curve from (argument, value) pairs with rising arguments.
    ///
    /// # Errors
    /// Fewer than two points, arguments that do not rise, or numbers that are not finite.
    pub fn new(points: &[(f64, f64)]) -> Result<Self, InterpolationError> {
        if points.len() < 2 {
            return Err(InterpolationError::TooFewPoints(points.len()));
        }
        if points.iter().any(|(x, y)| !x.is_finite() || !y.is_finite()) {
            return Err(InterpolationError::NotFinite);
        }
        for pair in points.windows(2) {
            if pair[1].0 <= pair[0].0 {
                return Err(InterpolationError::NotRising { before: pair[0].0, after: pair[1].0 });
            }
        }
        Ok(Self { points: points.to_vec(), slopes: slopes(points) })
    }

    /// First and last argument of the table.
    pub fn range(&self) -> (f64, f64) {
        (self.points[0].0, self.points[self.points.len() - 1].0)
    }

    /// The points the curve passes through.
    pub fn points(&self) -> &[(f64, f64)] {
        &self.points
    }

    /// Value at `x`.
    ///
    /// # Errors
    /// [`InterpolationError::Outside`] when `x` lies outside the table: nothing is extrapolated.
    pub fn value(&self, x: f64) -> Result<f64, InterpolationError> {
        let Piece { t, values: (y0, y1), slopes: (m0, m1), .. } = self.piece(x)?;
        let rest = 1.0 - t;
        Ok(y0 * (1.0 + 2.0 * t) * rest * rest + m0 * t * rest * rest + y1 * t * t * (3.0 - 2.0 * t)
            - m1 * t * t * rest)
    }

    /// Number of the piece in which `x` lies, and the integral from the first point of that piece to `x`.
    ///
    /// # Errors
    /// As [`Self::value`].
    pub(crate) fn integral_in_piece(&self, x: f64) -> Result<(usize, f64), InterpolationError> {
        let Piece { number, width, t, values: (y0, y1), slopes: (m0, m1) } = self.piece(x)?;
        let (square, cube) = (t * t, t * t * t);
        let fourth = square * square;
        let of_values = y0 * (t - cube + 0.5 * fourth) + y1 * (cube - 0.5 * fourth);
        let of_slopes =
            m0 * (0.5 * square - 2.0 / 3.0 * cube + 0.25 * fourth) + m1 * (0.25 * fourth - cube / 3.0);
        Ok((number, width * (of_values + of_slopes)))
    }

    fn piece(&self, x: f64) -> Result<Piece, InterpolationError> {
        let (from, to) = self.range();
        if !(x >= from && x <= to) {
            return Err(InterpolationError::Outside { from, to, given: x });
        }
        let after = self.points.partition_point(|point| point.0 <= x).clamp(1, self.points.len() - 1);
        let ((x0, y0), (x1, y1)) = (self.points[after - 1], self.points[after]);
        let width = x1 - x0;
        Ok(Piece {
            number: after - 1,
            width,
            t: (x - x0) / width,
            values: (y0, y1),
            slopes: (self.slopes[after - 1] * width, self.slopes[after] * width),
        })
    }
}

/// Where an argument lies: t from 0 to 1 along a piece, with its values and its slopes for each unit of t.
struct Piece {
    number: usize,
    width: f64,
    t: f64,
    values: (f64, f64),
    slopes: (f64, f64),
}

fn slopes(points: &[(f64, f64)]) -> Vec<f64> {
    let widths: Vec<f64> = points.windows(2).map(|pair| pair[1].0 - pair[0].0).collect();
    let secants: Vec<f64> =
        points.windows(2).zip(&widths).map(|(pair, width)| (pair[1].1 - pair[0].1) / width).collect();
    let last = secants.len();
    (0..points.len())
        .map(|i| {
            if i == 0 {
                end_slope(secants[0], secants.get(1).copied(), widths[0], widths.get(1).copied())
            } else if i == last {
                let inner = last.checked_sub(2);
                end_slope(
                    secants[last - 1],
                    inner.map(|k| secants[k]),
                    widths[last - 1],
                    inner.map(|k| widths[k]),
                )
            } else {
                inner_slope(secants[i - 1], secants[i], widths[i - 1], widths[i])
            }
        })
        .collect()
}

fn inner_slope(left: f64, right: f64, left_width: f64, right_width: f64) -> f64 {
    if left * right <= 0.0 {
        return 0.0;
    }
    let (w1, w2) = (2.0 * right_width + left_width, right_width + 2.0 * left_width);
    (w1 + w2) / (w1 / left + w2 / right)
}

/// One-sided three-point slope, limited so that the end piece stays monotone.
fn end_slope(near: f64, far: Option<f64>, width: f64, far_width: Option<f64>) -> f64 {
    let (Some(far), Some(far_width)) = (far, far_width) else { return near };
    let slope = ((2.0 * width + far_width) * near - width * far) / (width + far_width);
    if slope * near <= 0.0 {
        0.0
    } else if near * far <= 0.0 && slope.abs() > 3.0 * near.abs() {
        3.0 * near
    } else {
        slope
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn passes_through_its_points_and_keeps_rising() {
        let curve = MonotoneCubic::new(&[(0.0, 0.0), (1.0, 0.1), (2.0, 3.0), (4.0, 3.1)]).unwrap();
        for &(x, y) in curve.points() {
            assert!((curve.value(x).unwrap() - y).abs() < 1e-15);
        }
        let mut last = f64::NEG_INFINITY;
        for step in 0..=400 {
            let value = curve.value(f64::from(step) * 0.01).unwrap();
            assert!(value >= last - 1e-15, "falls at {step}");
            last = value;
        }
    }

    #[test]
    fn reproduces_a_straight_line() {
        let curve = MonotoneCubic::new(&[(0.0, 1.0), (2.0, 5.0), (3.0, 7.0)]).unwrap();
        assert!((curve.value(1.3).unwrap() - 3.6).abs() < 1e-14);
    }

    #[test]
    fn never_extrapolates() {
        let curve = MonotoneCubic::new(&[(0.0, 0.0), (1.0, 1.0)]).unwrap();
        let outside = InterpolationError::Outside { from: 0.0, to: 1.0, given: 1.1 };
        assert_eq!(curve.value(1.1), Err(outside));
        assert!(curve.value(f64::NAN).is_err());
    }

    #[test]
    fn refuses_arguments_that_do_not_rise() {
        assert!(matches!(
            MonotoneCubic::new(&[(0.0, 0.0), (0.0, 1.0)]),
            Err(InterpolationError::NotRising { .. })
        ));
    }
}
