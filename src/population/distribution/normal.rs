//! The standard normal: density, both tails, quantile, moments when truncated.

use std::f64::consts::{PI, SQRT_2};

/// Density φ(z) = exp(−z²/2)/√(2π).
pub fn density(z: f64) -> f64 {
    (-0.5 * z * z).exp() / (2.0 * PI).sqrt()
}

/// Share below z, Φ(z), to full relative accuracy in the lower tail.
///
/// Source: Φ(z) = erfc(−z/√2)/2 (Abramowitz & Stegun, *Handbook of Mathematical Functions*, 26.2.29).
pub fn below(z: f64) -> f64 {
    0.5 * libm::erfc(-z / SQRT_2)
}

/// Share above z, to full relative accuracy in the upper tail.
pub fn above(z: f64) -> f64 {
    below(-z)
}

/// Share between two values, without loss when both lie in one tail.
pub fn between(low: f64, high: f64) -> f64 {
    if low > 0.0 { above(low) - above(high) } else { below(high) - below(low) }
}

/// z with a share `p` below it; infinite at 0 and 1.
///
/// Start from Abramowitz & Stegun 26.2.23 (error below 4.5e-4), then three steps of Halley's method on Φ.
///
/// # Example
/// ```
/// let z = hubgrip::population::distribution::normal::quantile(0.00135);
/// assert!((z + 2.99998).abs() < 5e-6);
/// ```
pub fn quantile(p: f64) -> f64 {
    if p <= 0.0 {
        return f64::NEG_INFINITY;
    }
    if p >= 1.0 {
        return f64::INFINITY;
    }
    if p > 0.5 { -lower_quantile(1.0 - p) } else { lower_quantile(p) }
}

/// z with a share `p` above it, to full accuracy for a small `p`.
pub fn upper_quantile(p: f64) -> f64 {
    -quantile(p)
}

fn lower_quantile(p: f64) -> f64 {
    let t = (-2.0 * p.ln()).sqrt();
    let above = t
        - (2.515_517 + t * (0.802_853 + t * 0.010_328))
            / (1.0 + t * (1.432_788 + t * (0.189_269 + t * 0.001_308)));
    let mut z = -above;
    for _ in 0..3 {
        let step = (below(z) - p) / density(z);
        z -= step / (1.0 + 0.5 * z * step);
    }
    z
}

/// Mean and variance of the standard normal cut at `low` and `high`.
///
/// Source: N. L. Johnson, S. Kotz and N. Balakrishnan, *Continuous Univariate Distributions*, volume 1, section 13.10.1.
pub fn truncated_moments(low: f64, high: f64) -> (f64, f64) {
    let share = between(low, high);
    let (at_low, at_high) = (density(low), density(high));
    let mean = (at_low - at_high) / share;
    let variance = 1.0 + (low * at_low - high * at_high) / share - mean * mean;
    (mean, variance)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_quantile_inverts_both_tails() {
        for exponent in 1..18 {
            let p = 10f64.powi(-exponent);
            approx::assert_relative_eq!(below(quantile(p)), p, max_relative = 1e-13);
        }
        for p in [0.2, 0.5, 0.7, 0.999] {
            approx::assert_relative_eq!(below(quantile(p)), p, max_relative = 1e-14);
        }
    }

    /// Abramowitz & Stegun, table 26.5: z(0.025) = 1.95996, z(0.001) = 3.09023.
    #[test]
    fn agrees_with_the_printed_table() {
        assert!((upper_quantile(0.025) - 1.95996).abs() < 5e-6);
        assert!((upper_quantile(0.001) - 3.09023).abs() < 5e-6);
    }

    #[test]
    fn a_uniform_like_slice_has_the_moments_of_a_uniform() {
        let (mean, variance) = truncated_moments(-0.01, 0.01);
        assert!(mean.abs() < 1e-15);
        approx::assert_relative_eq!(variance, 0.01 * 0.01 / 3.0, max_relative = 1e-4);
    }
}
