//! Gauss–Legendre quadrature and Legendre series on one panel.

use std::sync::OnceLock;

/// Points of the rule, and coefficients of a series.
pub const POINTS: usize = 16;

/// Abscissae and weights on −1 to 1, with the values of the Legendre polynomials at each abscissa.
pub struct Rule {
    /// Abscissae, rising.
    pub abscissae: [f64; POINTS],
    /// Weights; they add up to 2.
    pub weights: [f64; POINTS],
    /// Polynomial n at abscissa i.
    pub polynomials: [[f64; POINTS]; POINTS],
}

/// The rule with [`POINTS`] points: exact for polynomials up to degree 2·[`POINTS`] − 1.
///
/// Source: roots of the Legendre polynomial by Newton's method, weights 2/((1 − x²) P′(x)²)
/// (Abramowitz & Stegun, *Handbook of Mathematical Functions*, 25.4.29).
///
/// # Example
/// ```
/// let rule = hubgrip::population::integration::quadrature::rule();
/// let third: f64 = rule.abscissae.iter().zip(&rule.weights).map(|(x, w)| w * x * x).sum();
/// assert!((third - 2.0 / 3.0).abs() < 1e-15);
/// ```
pub fn rule() -> &'static Rule {
    static RULE: OnceLock<Rule> = OnceLock::new();
    RULE.get_or_init(build)
}

fn build() -> Rule {
    let mut rule =
        Rule { abscissae: [0.0; POINTS], weights: [0.0; POINTS], polynomials: [[0.0; POINTS]; POINTS] };
    let count = POINTS as f64;
    for i in 0..POINTS {
        let mut x = -(std::f64::consts::PI * (i as f64 + 0.75) / (count + 0.5)).cos();
        for _ in 0..8 {
            let (value, slope) = legendre(x);
            x -= value / slope;
        }
        let slope = legendre(x).1;
        rule.abscissae[i] = x;
        rule.weights[i] = 2.0 / ((1.0 - x * x) * slope * slope);
        let (mut before, mut now) = (1.0, x);
        for n in 0..POINTS {
            rule.polynomials[n][i] = before;
            let order = n as f64 + 1.0;
            (before, now) = (now, ((2.0 * order + 1.0) * x * now - order * before) / (order + 1.0));
        }
    }
    rule
}

/// Legendre polynomial of degree [`POINTS`] and its derivative.
fn legendre(x: f64) -> (f64, f64) {
    let (mut before, mut now) = (1.0, x);
    for n in 1..POINTS {
        let order = n as f64;
        (before, now) = (now, ((2.0 * order + 1.0) * x * now - order * before) / (order + 1.0));
    }
    (now, POINTS as f64 * (x * now - before) / (x * x - 1.0))
}

/// Integral of `function` from `low` to `high` by one rule.
pub fn integral(low: f64, high: f64, mut function: impl FnMut(f64) -> f64) -> f64 {
    let rule = rule();
    let (middle, half) = (0.5 * (low + high), 0.5 * (high - low));
    let mut sum = 0.0;
    for (x, w) in rule.abscissae.iter().zip(&rule.weights) {
        sum += w * function(middle + half * x);
    }
    half * sum
}

/// Value of a Legendre series at `x` in −1 to 1, by Clenshaw's recurrence.
pub fn series(coefficients: &[f64], x: f64) -> f64 {
    let (mut next, mut after) = (0.0, 0.0);
    for (n, coefficient) in coefficients.iter().enumerate().rev() {
        let order = n as f64;
        let now = coefficient + (2.0 * order + 1.0) / (order + 1.0) * x * next
            - (order + 1.0) / (order + 2.0) * after;
        (after, next) = (next, now);
    }
    next
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_rule_is_exact_to_its_degree() {
        for degree in 0..2 * POINTS as i32 {
            let exact = if degree % 2 == 0 { 2.0 / f64::from(degree + 1) } else { 0.0 };
            let found = integral(-1.0, 1.0, |x| x.powi(degree));
            assert!((found - exact).abs() < 1e-14, "degree {degree}: {found}");
        }
    }

    #[test]
    fn a_series_gives_its_polynomials_back() {
        let rule = rule();
        for n in 0..POINTS {
            let mut one = [0.0; POINTS];
            one[n] = 1.0;
            for (i, x) in rule.abscissae.iter().enumerate() {
                assert!((series(&one, *x) - rule.polynomials[n][i]).abs() < 1e-13);
            }
        }
    }
}
