//! A density held as Legendre polynomials on panels, with both cumulative shares.

use super::quadrature::{POINTS, rule, series};

/// A series has converged when its last coefficients are below this share of the greatest.
const CONVERGED: f64 = 1e-12;
/// Share of a population that is not followed up any more.
const NEGLIGIBLE: f64 = 1e-22;
/// Most halvings of the stretch between two kinks.
const DEPTH: usize = 10;

/// A density with its panels.
#[derive(Debug, Clone, PartialEq)]
pub struct Curve {
    panels: Vec<Panel>,
    kinks: Vec<f64>,
}

/// One panel: a polynomial density.
#[derive(Debug, Clone, PartialEq)]
struct Panel {
    low: f64,
    high: f64,
    /// Legendre coefficients of the density.
    density: [f64; POINTS],
    /// Density at the abscissae of the rule.
    nodes: [f64; POINTS],
    /// Legendre coefficients of the share from the lower end.
    share: [f64; POINTS + 1],
    /// Share of this panel, of all panels below and of all above it.
    mass: f64,
    below: f64,
    above: f64,
}

impl Panel {
    fn of(density: &impl Fn(f64) -> f64, low: f64, high: f64) -> Self {
        let rule = rule();
        let (middle, half) = (0.5 * (low + high), 0.5 * (high - low));
        let nodes = rule.abscissae.map(|x| density(middle + half * x));
        let mut coefficients = [0.0; POINTS];
        for (n, coefficient) in coefficients.iter_mut().enumerate() {
            let mut sum = 0.0;
            for ((weight, node), polynomial) in rule.weights.iter().zip(&nodes).zip(&rule.polynomials[n]) {
                sum += weight * node * polynomial;
            }
            *coefficient = 0.5 * (2.0 * n as f64 + 1.0) * sum;
        }
        let mut share = [0.0; POINTS + 1];
        share[0] = coefficients[0] * half;
        share[1] = coefficients[0] * half;
        for (n, coefficient) in coefficients.iter().enumerate().skip(1) {
            let part = coefficient * half / (2.0 * n as f64 + 1.0);
            share[n + 1] += part;
            share[n - 1] -= part;
        }
        let mass = 2.0 * half * coefficients[0];
        Self { low, high, density: coefficients, nodes, share, mass, below: 0.0, above: 0.0 }
    }

    fn has_converged(&self) -> bool {
        let greatest = self.density.iter().fold(0.0, |greatest: f64, c| greatest.max(c.abs()));
        let rest = self.density[POINTS - 1].abs().max(self.density[POINTS - 2].abs());
        rest <= CONVERGED * greatest || rest * (self.high - self.low) <= NEGLIGIBLE
    }

    fn place(&self, x: f64) -> f64 {
        ((x - self.low) - (self.high - x)) / (self.high - self.low)
    }

    fn share_to(&self, x: f64) -> f64 {
        series(&self.share, self.place(x)).clamp(0.0, self.mass.max(0.0))
    }
}

impl Curve {
    /// A density that is analytic between its kinks; the first and the last kink end its support.
    pub fn new(density: impl Fn(f64) -> f64, kinks: Vec<f64>) -> Self {
        let kinks = tidied(kinks);
        let mut panels = Vec::new();
        for stretch in kinks.windows(2) {
            halve(&density, stretch[0], stretch[1], DEPTH, &mut panels);
        }
        let mut sum = 0.0;
        for panel in &mut panels {
            panel.below = sum;
            sum += panel.mass;
        }
        sum = 0.0;
        for panel in panels.iter_mut().rev() {
            panel.above = sum;
            sum += panel.mass;
        }
        Self { panels, kinks }
    }

    /// Where the density is not analytic, rising.
    pub fn kinks(&self) -> &[f64] {
        &self.kinks
    }

    /// Least and greatest value.
    pub fn support(&self) -> (f64, f64) {
        (self.kinks.first().copied().unwrap_or(0.0), self.kinks.last().copied().unwrap_or(0.0))
    }

    /// All of it; 1 but for rounding, which tells how good the panels are.
    pub fn mass(&self) -> f64 {
        self.panels.last().map_or(0.0, |last| last.below + last.mass)
    }

    /// Ends of all panels, rising.
    pub fn edges(&self) -> impl Iterator<Item = f64> + '_ {
        self.panels.iter().map(|panel| panel.low).chain(self.panels.last().map(|panel| panel.high))
    }

    /// Integral of this density times that of `other` mirrored about `z`, between two neighbouring panel ends.
    pub(super) fn product(&self, other: &Self, z: f64, from: f64, to: f64) -> f64 {
        let middle = 0.5 * (from + to);
        let (Some(one), Some(two)) = (self.panel(middle), other.panel(z - middle)) else { return 0.0 };
        super::quadrature::integral(from, to, |x| {
            series(&one.density, one.place(x)) * series(&two.density, two.place(z - x))
        })
    }

    /// Density at `x`.
    pub fn density(&self, x: f64) -> f64 {
        self.panel(x).map_or(0.0, |panel| series(&panel.density, panel.place(x)).max(0.0))
    }

    /// Share below `x`.
    pub fn below(&self, x: f64) -> f64 {
        let (low, high) = self.support();
        if x <= low {
            0.0
        } else if x >= high {
            1.0
        } else {
            self.panel(x).map_or(0.0, |panel| panel.below + panel.share_to(x))
        }
    }

    /// Share above `x`.
    pub fn above(&self, x: f64) -> f64 {
        let (low, high) = self.support();
        if x <= low {
            1.0
        } else if x >= high {
            0.0
        } else {
            self.panel(x).map_or(0.0, |panel| panel.above + (panel.mass - panel.share_to(x)).max(0.0))
        }
    }

    /// Expected value of a function that is analytic between `breaks` (any order) and the kinks.
    pub fn expect(&self, breaks: &[f64], mut function: impl FnMut(f64) -> f64) -> f64 {
        let (low, high) = self.support();
        let mut inside: Vec<f64> = breaks.iter().copied().filter(|at| *at > low && *at < high).collect();
        inside.sort_by(f64::total_cmp);
        let rule = rule();
        let mut next = inside.into_iter().peekable();
        let mut sum = 0.0;
        for panel in &self.panels {
            let mut from = panel.low;
            let mut whole = true;
            while let Some(at) = next.next_if(|at| *at < panel.high) {
                if at > from {
                    sum += piece(panel, from, at, &mut function);
                    from = at;
                    whole = false;
                }
            }
            if !whole {
                sum += piece(panel, from, panel.high, &mut function);
                continue;
            }
            let (middle, half) = (0.5 * (panel.low + panel.high), 0.5 * (panel.high - panel.low));
            let mut part = 0.0;
            for i in 0..POINTS {
                let weight = rule.weights[i] * panel.nodes[i];
                if weight > 0.0 {
                    part += weight * function(middle + half * rule.abscissae[i]);
                }
            }
            sum += half * part;
        }
        sum
    }

    fn panel(&self, x: f64) -> Option<&Panel> {
        let after = self.panels.partition_point(|panel| panel.low <= x);
        let panel = self.panels.get(after.checked_sub(1)?)?;
        (x <= panel.high).then_some(panel)
    }
}

fn piece(panel: &Panel, from: f64, to: f64, function: &mut impl FnMut(f64) -> f64) -> f64 {
    super::quadrature::integral(from, to, |x| series(&panel.density, panel.place(x)).max(0.0) * function(x))
}

fn halve(density: &impl Fn(f64) -> f64, low: f64, high: f64, depth: usize, panels: &mut Vec<Panel>) {
    let panel = Panel::of(density, low, high);
    let middle = 0.5 * (low + high);
    if depth == 0 || panel.has_converged() || middle <= low || middle >= high {
        panels.push(panel);
    } else {
        halve(density, low, middle, depth - 1, panels);
        halve(density, middle, high, depth - 1, panels);
    }
}

/// Kinks in rising order, those that only rounding parts taken together.
fn tidied(mut kinks: Vec<f64>) -> Vec<f64> {
    kinks.sort_by(f64::total_cmp);
    let span = match kinks.as_slice() {
        [first, .., last] => last - first,
        _ => 0.0,
    };
    kinks.dedup_by(|later, earlier| *later - *earlier <= 1e-12 * span);
    kinks
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::population::distribution::normal;

    #[test]
    fn a_normal_keeps_its_tails() {
        let curve = Curve::new(normal::density, vec![-9.0, 9.0]);
        approx::assert_relative_eq!(curve.mass(), 1.0, max_relative = 1e-14);
        for z in [0.0, 1.0, 3.0, 5.0, 7.0] {
            approx::assert_relative_eq!(curve.below(-z), normal::below(-z), max_relative = 1e-6);
            approx::assert_relative_eq!(curve.above(z), normal::above(z), max_relative = 1e-6);
        }
        approx::assert_relative_eq!(curve.below(-5.0), normal::below(-5.0), max_relative = 1e-11);
    }

    #[test]
    fn an_expectation_is_split_at_its_breaks() {
        let curve = Curve::new(|_| 1.0, vec![0.0, 1.0]);
        let found = curve.expect(&[0.3], |x| if x < 0.3 { 0.0 } else { x });
        approx::assert_relative_eq!(found, 0.5 * (1.0 - 0.09), max_relative = 1e-14);
    }
}
