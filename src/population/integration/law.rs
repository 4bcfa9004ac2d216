//! The law of a quantity: values one by one or a density; sums, mappings, shares, expectations.

use super::curve::Curve;
use crate::population::distribution::{Atom, Distribution, Shape};

/// Law of a quantity.
#[derive(Debug, Clone, PartialEq)]
pub enum Law {
    /// Values one by one, rising.
    Atoms(Vec<Atom>),
    /// A density.
    Curve(Curve),
}

impl Law {
    /// Always the same value.
    pub fn fixed(value: f64) -> Self {
        Self::Atoms(vec![Atom { value, share: 1.0 }])
    }

    /// The law of a distribution.
    pub fn of(distribution: &Distribution) -> Self {
        match distribution.shape() {
            Shape::Fixed(value) => Self::fixed(*value),
            Shape::Measured(atoms) => Self::Atoms(atoms.clone()),
            _ => {
                let (low, high) = distribution.support();
                Self::Curve(Curve::new(|x| distribution.density(x), vec![low, high]))
            }
        }
    }

    /// The value when there is only one.
    pub fn only_value(&self) -> Option<f64> {
        match self {
            Self::Atoms(atoms) => match atoms.as_slice() {
                [only] => Some(only.value),
                _ => None,
            },
            Self::Curve(_) => None,
        }
    }

    /// Law of a monotone function of the quantity.
    ///
    /// `forward` maps the quantity, `inverse` gives it back with |dx/dy|.
    pub fn mapped(&self, forward: impl Fn(f64) -> f64, inverse: impl Fn(f64) -> (f64, f64)) -> Self {
        match self {
            Self::Atoms(atoms) => Self::Atoms(in_order(
                atoms.iter().map(|atom| Atom { value: forward(atom.value), share: atom.share }).collect(),
            )),
            Self::Curve(curve) => {
                let kinks = curve.kinks().iter().map(|kink| forward(*kink)).collect();
                Self::Curve(Curve::new(
                    |y| {
                        let (x, stretch) = inverse(y);
                        curve.density(x) * stretch
                    },
                    kinks,
                ))
            }
        }
    }

    /// Law of `factor` times the quantity plus `offset`; the factor is not zero.
    pub fn scaled(&self, factor: f64, offset: f64) -> Self {
        if factor == 1.0 && offset == 0.0 {
            return self.clone();
        }
        self.mapped(|x| factor * x + offset, |y| ((y - offset) / factor, 1.0 / factor.abs()))
    }

    /// Law of the natural logarithm; the quantity is above zero.
    pub fn logarithm(&self) -> Self {
        self.mapped(f64::ln, |y| (y.exp(), y.exp()))
    }

    /// Law of the sum with an independent quantity.
    pub fn sum(&self, other: &Self) -> Self {
        match (self, other) {
            (Self::Atoms(a), Self::Atoms(b)) => {
                let mut all = Vec::with_capacity(a.len() * b.len());
                for one in a {
                    all.extend(
                        b.iter()
                            .map(|two| Atom { value: one.value + two.value, share: one.share * two.share }),
                    );
                }
                Self::Atoms(in_order(all))
            }
            (Self::Atoms(atoms), Self::Curve(curve)) | (Self::Curve(curve), Self::Atoms(atoms)) => {
                if let [only] = atoms.as_slice() {
                    let by = only.value;
                    return Self::Curve(curve.clone()).scaled(1.0, by);
                }
                let kinks = sums(curve.kinks(), &atoms.iter().map(|atom| atom.value).collect::<Vec<_>>());
                let density =
                    |z: f64| atoms.iter().map(|atom| atom.share * curve.density(z - atom.value)).sum();
                Self::Curve(Curve::new(density, kinks))
            }
            (Self::Curve(a), Self::Curve(b)) => Self::Curve(convolution(a, b)),
        }
    }

    /// Share strictly below `x`.
    pub fn below(&self, x: f64) -> f64 {
        match self {
            Self::Atoms(atoms) => {
                let count = atoms.partition_point(|atom| atom.value < x);
                atoms[..count].iter().map(|atom| atom.share).sum()
            }
            Self::Curve(curve) => curve.below(x),
        }
    }

    /// Share strictly above `x`.
    pub fn above(&self, x: f64) -> f64 {
        match self {
            Self::Atoms(atoms) => {
                let count = atoms.partition_point(|atom| atom.value <= x);
                atoms[count..].iter().map(|atom| atom.share).sum()
            }
            Self::Curve(curve) => curve.above(x),
        }
    }

    /// Density at `x`; zero for values one by one.
    pub fn density(&self, x: f64) -> f64 {
        match self {
            Self::Atoms(_) => 0.0,
            Self::Curve(curve) => curve.density(x),
        }
    }

    /// Least and greatest value.
    pub fn support(&self) -> (f64, f64) {
        match self {
            Self::Atoms(atoms) => {
                (atoms.first().map_or(0.0, |atom| atom.value), atoms.last().map_or(0.0, |atom| atom.value))
            }
            Self::Curve(curve) => curve.support(),
        }
    }

    /// Where shares are not analytic: the kinks of a density, the values themselves.
    pub fn kinks(&self) -> Vec<f64> {
        match self {
            Self::Atoms(atoms) => atoms.iter().map(|atom| atom.value).collect(),
            Self::Curve(curve) => curve.kinks().to_vec(),
        }
    }

    /// Expected value of a function that is analytic between `breaks`.
    pub fn expect(&self, breaks: &[f64], mut function: impl FnMut(f64) -> f64) -> f64 {
        match self {
            Self::Atoms(atoms) => atoms.iter().map(|atom| atom.share * function(atom.value)).sum(),
            Self::Curve(curve) => curve.expect(breaks, function),
        }
    }

    /// Mean.
    pub fn mean(&self) -> f64 {
        self.expect(&[], |x| x)
    }

    /// Variance.
    pub fn variance(&self) -> f64 {
        let mean = self.mean();
        self.expect(&[], |x| (x - mean) * (x - mean))
    }
}

/// Values closer than this share of the whole span are one: sums of rounded measurements that only rounding parts.
const ONE: f64 = 1e-10;

fn in_order(mut atoms: Vec<Atom>) -> Vec<Atom> {
    atoms.sort_by(|a, b| a.value.total_cmp(&b.value));
    let near = match atoms.as_slice() {
        [first, .., last] => ONE * (last.value - first.value),
        _ => 0.0,
    };
    let mut merged: Vec<Atom> = Vec::with_capacity(atoms.len());
    for atom in atoms {
        match merged.last_mut() {
            Some(last) if atom.value - last.value <= near => last.share += atom.share,
            _ => merged.push(atom),
        }
    }
    merged
}

fn sums(a: &[f64], b: &[f64]) -> Vec<f64> {
    let mut all = Vec::with_capacity(a.len() * b.len());
    for one in a {
        all.extend(b.iter().map(|two| one + two));
    }
    all
}

/// Density of the sum: ∫ f(x) g(z − x) dx, split at the panels of both.
fn convolution(a: &Curve, b: &Curve) -> Curve {
    let (edges_a, edges_b): (Vec<f64>, Vec<f64>) = (a.edges().collect(), b.edges().collect());
    let (low_b, high_b) = b.support();
    let (low_a, high_a) = a.support();
    let density = |z: f64| {
        let (from, to) = (low_a.max(z - high_b), high_a.min(z - low_b));
        if from >= to {
            return 0.0;
        }
        let mut cuts: Vec<f64> = Vec::with_capacity(edges_a.len() + edges_b.len() + 2);
        cuts.push(from);
        cuts.extend(edges_a.iter().copied().filter(|x| *x > from && *x < to));
        cuts.extend(edges_b.iter().map(|y| z - y).filter(|x| *x > from && *x < to));
        cuts.push(to);
        cuts.sort_by(f64::total_cmp);
        cuts.windows(2).map(|piece| a.product(b, z, piece[0], piece[1])).sum::<f64>().max(0.0)
    };
    Curve::new(density, sums(a.kinks(), b.kinks()))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::population::distribution::normal;

    fn law(distribution: Result<Distribution, crate::population::distribution::DistributionError>) -> Law {
        Law::of(&distribution.unwrap())
    }

    #[test]
    fn two_normals_add_up_to_a_normal_even_in_the_tails() {
        let sum = law(Distribution::normal(1.0, 3.0)).sum(&law(Distribution::normal(-2.0, 4.0)));
        for z in [-7.0, -5.0, -1.0, 0.0, 2.0, 6.0] {
            let x = -1.0 + 5.0 * z;
            approx::assert_relative_eq!(sum.below(x), normal::below(z), max_relative = 1e-6);
            approx::assert_relative_eq!(sum.above(x), normal::above(z), max_relative = 1e-6);
        }
        approx::assert_relative_eq!(sum.variance(), 25.0, max_relative = 1e-12);
    }

    #[test]
    fn two_uniforms_make_a_trapezoid() {
        let sum = law(Distribution::uniform(0.0, 1.0)).sum(&law(Distribution::uniform(0.0, 3.0)));
        approx::assert_relative_eq!(sum.density(0.5), 0.5 / 3.0, max_relative = 1e-12);
        approx::assert_relative_eq!(sum.density(2.0), 1.0 / 3.0, max_relative = 1e-12);
        approx::assert_relative_eq!(sum.below(1e-3), 1e-6 / 6.0, max_relative = 1e-9);
        approx::assert_relative_eq!(sum.above(4.0 - 1e-3), 1e-6 / 6.0, max_relative = 1e-6);
    }

    #[test]
    fn a_narrow_normal_on_a_wide_uniform_is_resolved() {
        let sum = law(Distribution::uniform(0.0, 1.0)).sum(&law(Distribution::normal(0.0, 1e-3)));
        // Share below x: 1e-3 times the integral of Φ.
        let z: f64 = -2.0;
        let exact = 1e-3 * (z * normal::below(z) + normal::density(z));
        approx::assert_relative_eq!(sum.below(1e-3 * z), exact, max_relative = 1e-9);
    }

    #[test]
    fn measured_values_are_averaged_without_smoothing() {
        let atoms = law(Distribution::measured(&[0.0, 1.0]));
        let sum = atoms.sum(&law(Distribution::uniform(0.0, 0.5)));
        assert_eq!(sum.density(0.75), 0.0);
        approx::assert_relative_eq!(sum.below(0.75), 0.5, max_relative = 1e-14);
        let both = atoms.sum(&atoms);
        assert_eq!(both.below(1.0), 0.25);
        assert_eq!(both.above(1.0), 0.25);
    }

    #[test]
    fn a_logarithm_keeps_the_shares() {
        let uniform = law(Distribution::uniform(1.0, 2.0));
        let log = uniform.logarithm();
        approx::assert_relative_eq!(log.below(1.25f64.ln()), 0.25, max_relative = 1e-13);
        approx::assert_relative_eq!(log.expect(&[], f64::exp), 1.5, max_relative = 1e-13);
    }
}
