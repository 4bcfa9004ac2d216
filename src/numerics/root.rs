//! Root of a function inside a bracket.

use thiserror::Error;

/// Why no root was found.
#[derive(Debug, Clone, Copy, PartialEq, Error)]
pub enum RootError {
    /// The function has the same sign at both ends, so there may be no root between them.
    #[error("no change of sign between {low} (value {at_low}) and {high} (value {at_high})")]
    NotBracketed {
        /// Lower end of the bracket.
        low: f64,
        /// Upper end of the bracket.
        high: f64,
        /// Function value at the lower end.
        at_low: f64,
        /// Function value at the upper end.
        at_high: f64,
    },
    /// A function value was not a number.
    #[error("the function is not finite at {0}")]
    NotFinite(f64),
    /// The iteration limit was reached.
    #[error("no convergence between {low} and {high} after {iterations} steps")]
    NotConverged {
        /// Last lower end.
        low: f64,
        /// Last upper end.
        high: f64,
        /// Steps taken.
        iterations: usize,
    },
}

const MAX_ITERATIONS: usize = 200;

/// Root of `function` between `low` and `high`, by Brent's method.
///
/// The bracket must hold a change of sign; an end that is itself a root is accepted. The root is found
/// to `tolerance` (absolute, in the unit of the argument) or to the last bits of a double, whichever is
/// coarser.
///
/// Source: R. P. Brent, *Algorithms for Minimization without Derivatives*, Prentice-Hall 1973, chapter 4.
///
/// # Errors
/// [`RootError`] when the ends do not bracket a root or a value is not finite.
///
/// # Example
/// ```
/// let root = hubgrip::numerics::root::bracketed(|x| x * x - 2.0, 0.0, 2.0, 0.0).unwrap();
/// assert!((root - 2.0_f64.sqrt()).abs() < 1e-15);
/// ```
pub fn bracketed(
    function: impl Fn(f64) -> f64,
    low: f64,
    high: f64,
    tolerance: f64,
) -> Result<f64, RootError> {
    let value = |x: f64| {
        let y = function(x);
        if y.is_finite() { Ok(y) } else { Err(RootError::NotFinite(x)) }
    };
    let (mut a, mut b) = (low, high);
    let (mut fa, mut fb) = (value(a)?, value(b)?);
    if fa == 0.0 {
        return Ok(a);
    }
    if fb == 0.0 {
        return Ok(b);
    }
    if (fa > 0.0) == (fb > 0.0) {
        return Err(RootError::NotBracketed { low, high, at_low: fa, at_high: fb });
    }
    let (mut c, mut fc) = (a, fa);
    let mut step = b - a;
    let mut previous_step = step;
    for _ in 0..MAX_ITERATIONS {
        if (fb > 0.0) == (fc > 0.0) {
            (c, fc) = (a, fa);
            step = b - a;
            previous_step = step;
        }
        if fc.abs() < fb.abs() {
            (a, b, c) = (b, c, b);
            (fa, fb, fc) = (fb, fc, fb);
        }
        let limit = 2.0 * f64::EPSILON * b.abs() + 0.5 * tolerance;
        let half = 0.5 * (c - b);
        if half.abs() <= limit || fb == 0.0 {
            return Ok(b);
        }
        if previous_step.abs() >= limit && fa.abs() > fb.abs() {
            let s = fb / fa;
            let (mut p, mut q) = if a == c {
                (2.0 * half * s, 1.0 - s)
            } else {
                let (q, r) = (fa / fc, fb / fc);
                (s * (2.0 * half * q * (q - r) - (b - a) * (r - 1.0)), (q - 1.0) * (r - 1.0) * (s - 1.0))
            };
            if p > 0.0 {
                q = -q;
            } else {
                p = -p;
            }
            if 2.0 * p < (3.0 * half * q - (limit * q).abs()).min((previous_step * q).abs()) {
                previous_step = step;
                step = p / q;
            } else {
                step = half;
                previous_step = half;
            }
        } else {
            step = half;
            previous_step = half;
        }
        (a, fa) = (b, fb);
        b += if step.abs() > limit { step } else { limit.copysign(half) };
        fb = value(b)?;
    }
    Err(RootError::NotConverged { low: b.min(c), high: b.max(c), iterations: MAX_ITERATIONS })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn finds_the_root_of_a_cubic_known_in_closed_form() {
        // x³ = 5, exact root 5^(1/3).
        let root = bracketed(|x| x.powi(3) - 5.0, 1.0, 3.0, 0.0).unwrap();
        assert!((root - 5.0_f64.cbrt()).abs() <= 4.0 * f64::EPSILON);
    }

    #[test]
    fn refuses_a_bracket_without_a_change_of_sign() {
        assert!(matches!(bracketed(|x| x * x + 1.0, -1.0, 1.0, 0.0), Err(RootError::NotBracketed { .. })));
    }

    #[test]
    fn names_the_place_where_the_function_is_not_finite() {
        assert_eq!(bracketed(|x| 1.0 / x, 0.0, 1.0, 0.0), Err(RootError::NotFinite(0.0)));
    }

    #[test]
    fn takes_an_end_that_is_a_root() {
        assert_eq!(bracketed(|x| x - 1.0, 1.0, 2.0, 0.0), Ok(1.0));
    }
}
