//! Random values of a distribution, fast enough not to be the bottleneck.
//!
//! A continuous distribution is drawn through its quantile function, which is held as cubics on cells that narrow
//! towards both tails by octaves of the remaining share, 2⁻¹ down to 2⁻⁵⁴: the relative width of a cell is the
//! same everywhere, so the tails are as good as the middle.

use rand::Rng;
use rand_xoshiro::Xoshiro256PlusPlus;

use crate::population::distribution::{Distribution, Shape, delta_of, normal};

/// Bits of a share that pick the cell within an octave.
const CELL_BITS: u32 = 5;
/// Cells of one octave.
const CELLS: usize = 1 << CELL_BITS;
/// Octaves of the share on each side.
const OCTAVES: usize = 53;
/// Biased exponent with cell of the uppermost cell of a whole number below 2⁵³, which stands for a share of 2⁻⁵⁴.
const UPPERMOST: usize = ((1023 + 52) << CELL_BITS) | (CELLS - 1);

/// Draws values of one distribution.
#[derive(Debug, Clone)]
pub enum Sampler {
    /// Always the same value.
    Fixed(f64),
    /// Every value alike: lower limit and width.
    Uniform(f64, f64),
    /// Through the quantile function.
    Quantile(Quantile),
    /// Skew normal: location, scale, δ, and the standard normal.
    Skew {
        /// Location.
        location: f64,
        /// Scale.
        scale: f64,
        /// δ = a/√(1 + a²).
        delta: f64,
        /// Standard normal.
        normal: Quantile,
    },
    /// Measured values with the share up to and including each.
    Measured {
        /// Values.
        values: Vec<f64>,
        /// Cumulative shares.
        shares: Vec<f64>,
    },
}

/// A quantile function as cubics: lower half and upper half of the shares.
#[derive(Debug, Clone)]
pub struct Quantile {
    cells: Vec<Cell>,
}

/// A cubic in the mantissa, 1 to 2, of the share; never astride two lines of the cache.
#[derive(Debug, Clone, Copy)]
#[repr(align(32))]
struct Cell([f64; 4]);

impl Sampler {
    /// A sampler of a distribution.
    pub fn of(distribution: &Distribution) -> Self {
        match distribution.shape() {
            Shape::Fixed(value) => Self::Fixed(*value),
            Shape::Normal { mean, sd } => Self::Quantile(Quantile::normal(*mean, *sd)),
            Shape::TruncatedNormal { mean, sd, low, high } => {
                let (a, b) = ((low - mean) / sd, (high - mean) / sd);
                let kept = normal::between(a, b);
                let slope = |z: f64| sd * kept / normal::density(z.clamp(a, b));
                let lower = |share: f64| {
                    let z = truncated_quantile(share, a, b, kept);
                    (mean + sd * z, slope(z))
                };
                let upper = |share: f64| {
                    let z = -truncated_quantile(share, -b, -a, kept);
                    (mean + sd * z, -slope(z))
                };
                Self::Quantile(Quantile::new(lower, upper))
            }
            Shape::Uniform { low, high } => Self::Uniform(*low, high - low),
            Shape::SkewNormal { location, scale, shape } => Self::Skew {
                location: *location,
                scale: *scale,
                delta: delta_of(*shape),
                normal: Quantile::normal(0.0, 1.0),
            },
            Shape::Measured(atoms) => {
                let mut sum = 0.0;
                let shares = atoms.iter().map(|atom| {
                    sum += atom.share;
                    sum
                });
                Self::Measured {
                    shares: shares.collect(),
                    values: atoms.iter().map(|atom| atom.value).collect(),
                }
            }
        }
    }

    /// Whether every value is the same.
    pub fn is_fixed(&self) -> bool {
        matches!(self, Self::Fixed(_))
    }

    /// Fills `values` with random ones.
    pub fn fill(&self, generator: &mut Xoshiro256PlusPlus, values: &mut [f64]) {
        match self {
            Self::Fixed(value) => values.fill(*value),
            Self::Uniform(low, width) => {
                for value in values {
                    *value = low + width * share(generator.next_u64());
                }
            }
            Self::Quantile(quantile) => {
                for value in values {
                    *value = quantile.value(generator.next_u64());
                }
            }
            Self::Skew { location, scale, delta, normal } => {
                let rest = (1.0 - delta * delta).sqrt();
                for value in values {
                    let half = normal.value(generator.next_u64()).abs();
                    let other = normal.value(generator.next_u64());
                    *value = location + scale * (delta * half + rest * other);
                }
            }
            Self::Measured { values: measured, shares } => {
                for value in values {
                    let share = share(generator.next_u64());
                    let index = shares.partition_point(|sum| *sum <= share).min(measured.len() - 1);
                    *value = measured[index];
                }
            }
        }
    }
}

/// A share from 0 up to but not including 1, of 53 random bits.
#[inline]
fn share(bits: u64) -> f64 {
    (bits >> 11) as i64 as f64 * 2f64.powi(-53)
}

/// z of a normal cut at a and b with a share of the kept part below it.
fn truncated_quantile(share: f64, a: f64, b: f64, kept: f64) -> f64 {
    let z = if a > 0.0 {
        normal::upper_quantile(normal::above(a) - share * kept)
    } else {
        normal::quantile(normal::below(a) + share * kept)
    };
    z.clamp(a, b)
}

impl Quantile {
    fn normal(mean: f64, sd: f64) -> Self {
        let at = |share: f64| {
            let z = normal::quantile(share);
            (sd * z, sd / normal::density(z))
        };
        Self::new(
            |share| {
                let (offset, slope) = at(share);
                (mean + offset, slope)
            },
            |share| {
                let (offset, slope) = at(share);
                (mean - offset, -slope)
            },
        )
    }

    /// `lower` gives value and slope at a share from below, `upper` at a share from above; both over the share.
    fn new(lower: impl Fn(f64) -> (f64, f64), upper: impl Fn(f64) -> (f64, f64)) -> Self {
        let mut cells = Vec::with_capacity(2 * OCTAVES * CELLS);
        for number in 0..OCTAVES * CELLS {
            cells.push(cell(number, &lower));
            cells.push(cell(number, &upper));
        }
        Self { cells }
    }

    /// The value of 64 random bits.
    #[inline]
    fn value(&self, bits: u64) -> f64 {
        // An odd number below 2⁵³: the middle of one of 2⁵² slices of 0 to 1/2; the lowest bit picks the half.
        let pattern = ((bits >> 11 | 1) as i64 as f64).to_bits();
        let number = UPPERMOST - (pattern >> (52 - CELL_BITS)) as usize;
        let t = f64::from_bits((pattern << CELL_BITS) & ((1 << 52) - 1) | (1023 << 52));
        match self.cells.get(2 * number + (bits & 1) as usize) {
            Some(Cell([a, b, c, d])) => a + t * (b + t * (c + t * d)),
            None => 0.0,
        }
    }
}

/// Cubic through value and slope at both ends of a cell.
fn cell(number: usize, at: &impl Fn(f64) -> (f64, f64)) -> Cell {
    let edge =
        |number: usize| f64::from_bits(((UPPERMOST - number) as u64) << (52 - CELL_BITS)) * 2f64.powi(-54);
    let low = edge(number);
    let high = if number == 0 { 0.5 } else { edge(number - 1) };
    let width = high - low;
    let ((y0, slope0), (y1, slope1)) = (at(low), at(high));
    let (m0, m1, rise) = (slope0 * width, slope1 * width, y1 - y0);
    // In t − 1 the coefficients are y0, m0, c, d; written out in t.
    let (c, d) = (3.0 * rise - 2.0 * m0 - m1, m0 + m1 - 2.0 * rise);
    Cell([y0 - m0 + c - d, m0 - 2.0 * c + 3.0 * d, c - 3.0 * d, d])
}

#[cfg(test)]
mod tests {
    use super::*;
    use rand::SeedableRng;

    /// Bits that give a share from below (side 0) or from above (side 1).
    fn bits(share: f64, side: u64) -> u64 {
        (((share * 2f64.powi(54)) as u64) << 11) | side
    }

    #[test]
    fn the_quantile_is_right_to_ten_digits_in_middle_and_tails() {
        let quantile = Quantile::normal(0.0, 1.0);
        for step in 1..4000 {
            let share = 0.5 * (-f64::from(step) * 0.007).exp();
            let exact = normal::quantile(((share * 2f64.powi(54)) as u64 | 1) as f64 * 2f64.powi(-54));
            assert!((quantile.value(bits(share, 0)) - exact).abs() < 2e-8, "{share}");
            assert!((quantile.value(bits(share, 1)) + exact).abs() < 2e-8, "{share}");
        }
    }

    #[test]
    fn every_sampler_has_mean_and_deviation_of_its_distribution() {
        let all = [
            Distribution::normal(3.0, 2.0),
            Distribution::truncated_normal(3.0, 2.0, 2.0, 4.5),
            Distribution::truncated_normal(0.0, 1.0, 1.0, 3.0),
            Distribution::uniform(-1.0, 5.0),
            Distribution::skewed(1.0, 0.5, 0.8),
            Distribution::measured(&[1.0, 2.0, 2.0, 7.0]),
            Distribution::fixed(4.0),
        ];
        let mut generator = Xoshiro256PlusPlus::seed_from_u64(11);
        let mut values = vec![0.0; 400_000];
        for distribution in all {
            let distribution = distribution.unwrap();
            Sampler::of(&distribution).fill(&mut generator, &mut values);
            let count = values.len() as f64;
            let mean = values.iter().sum::<f64>() / count;
            let sd = (values.iter().map(|x| (x - mean).powi(2)).sum::<f64>() / count).sqrt();
            let error = distribution.sd() / count.sqrt();
            assert!((mean - distribution.mean()).abs() <= 4.5 * error, "{distribution:?}: {mean}");
            assert!((sd - distribution.sd()).abs() <= 6.0 * error, "{distribution:?}: {sd}");
            let (low, high) = distribution.support();
            assert!(values.iter().all(|x| *x >= low - 1e-12 && *x <= high + 1e-12));
        }
    }
}
