//! Growth of the bore of a von Mises hub along its history, in units of Re/E.

use std::f64::consts::FRAC_PI_6;

use super::von_mises::SQRT_3;
use crate::mechanics::error::MechanicsError;

/// Nodes and weights of the eight-point Gauss rule on −1 … 1, positive half.
///
/// Source: M. Abramowitz and I. A. Stegun, *Handbook of Mathematical Functions* (1964), table 25.4.
const GAUSS: [(f64, f64); 4] = [
    (0.183_434_642_495_649_8, 0.362_683_783_378_362),
    (0.525_532_409_916_329, 0.313_706_645_877_887_27),
    (0.796_666_477_413_626_7, 0.222_381_034_453_374_48),
    (0.960_289_856_497_536_2, 0.101_228_536_290_376_26),
];

/// Intervals of the history, each half as long as the one before, towards the limit where its rate has a kink.
const HALVINGS: usize = 32;

/// u(a)/a at the onset of yield, m = Q².
pub(super) fn onset(front: f64, poisson: f64) -> f64 {
    let k = front / (3.0 + front * front).sqrt();
    k * ((1.0 - poisson) + (1.0 + poisson) / front)
}

/// Rate of u(a)/a with m when the zone ends at m with angle `edge` and the bore stands at angle `bore`.
pub(super) fn rate(front: f64, edge: f64, bore: f64, poisson: f64) -> Result<f64, MechanicsError> {
    let squares = 3.0 + front * front;
    let spread = (SQRT_3 * (edge - bore)).exp();
    let outside = 3.0 / squares.powf(1.5) * ((1.0 - poisson) + (1.0 + poisson) / front);
    let history = 3.0 * (1.0 - front) / (front * squares);
    if history == 0.0 {
        return Ok(spread * outside);
    }
    let smooth = (0.5 - poisson) * (spread * (edge + FRAC_PI_6).sin() - (bore + FRAC_PI_6).sin());
    let inside = smooth + 0.75 * (-SQRT_3 * bore).exp() * cosecant_integral(bore, edge);
    Ok(spread * outside + history * inside / SQRT_3)
}

/// ∫ e^(√3 x)/sin x dx; its logarithm taken out, the rest is smooth.
///
/// Rounding can put `from` at 0, where the integral grows without bound but its share of the growth vanishes.
fn cosecant_integral(from: f64, to: f64) -> f64 {
    let from = from.max(f64::EPSILON);
    let rest = |x: f64| (SQRT_3 * x).exp() / x.sin() - 1.0 / x;
    (to / from).ln() + points(from, to).map(|(x, weight)| weight * rest(x)).sum::<f64>()
}

/// ∫ rate dm from `start` to `end`, on intervals of ln m that shrink towards `last`, the end of the history.
pub(super) fn along_history(
    rate: impl Fn(f64) -> Result<f64, MechanicsError>,
    start: f64,
    end: f64,
    last: f64,
) -> Result<f64, MechanicsError> {
    let (end, last) = (end.ln(), last.ln());
    let mut from = start.ln();
    let mut sum = 0.0;
    for interval in 1..=HALVINGS {
        let to = if interval == HALVINGS { last } else { 0.5 * (from + last) };
        for (logarithm, weight) in points(from, to.min(end)) {
            let m = logarithm.exp();
            sum += weight * m * rate(m)?;
        }
        if to >= end {
            break;
        }
        from = to;
    }
    Ok(sum)
}

/// Places and weights of the Gauss rule on an interval.
fn points(from: f64, to: f64) -> impl Iterator<Item = (f64, f64)> {
    let (middle, half) = (0.5 * (from + to), 0.5 * (to - from));
    GAUSS.into_iter().flat_map(move |(node, weight)| {
        [(middle - half * node, half * weight), (middle + half * node, half * weight)]
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn gauss_rule_is_exact_to_degree_fifteen() {
        for degree in 0..=15 {
            let found: f64 = points(0.0, 1.0).map(|(x, weight)| weight * x.powi(degree)).sum();
            assert!((found * f64::from(degree + 1) - 1.0).abs() < 1e-14, "degree {degree}: {found}");
        }
    }

    #[test]
    fn cosecant_integral_follows_its_integrand() {
        // d/dx of the integral is e^(√3 x)/sin x; central differences of step h are off by about h².
        for x in [1e-3, 0.2, 0.9, 1.5] {
            let step = 1e-4 * x;
            let slope =
                (cosecant_integral(1e-6, x + step) - cosecant_integral(1e-6, x - step)) / (2.0 * step);
            let expected = (SQRT_3 * x).exp() / x.sin();
            assert!((slope / expected - 1.0).abs() < 1e-7, "at {x}: {slope} {expected}");
        }
    }

    #[test]
    fn history_of_a_kinked_rate_is_integrated_to_the_end() {
        // The rate of a thick hub near its pressure cap behaves like √(last − m): ∫ = ⅔ (last − start)^(3/2).
        let (start, last) = (0.1_f64, 0.35_f64);
        let found = along_history(|m| Ok((last - m).max(0.0).sqrt()), start, last, last).unwrap();
        let expected = 2.0 / 3.0 * (last - start).powf(1.5);
        assert!((found / expected - 1.0).abs() < 1e-12, "{found} {expected}");
    }
}
