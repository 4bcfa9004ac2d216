//! How a quantity scatters from part to part.

mod error;
pub mod measured;
pub mod normal;

pub use error::DistributionError;

/// Beyond so many standard deviations a normal is cut: 1.1e-19 of it on each side.
pub const REACH: f64 = 9.0;

/// Greatest skewness of a skew normal in magnitude; its own limit is 0.9953.
pub const MOST_SKEWNESS: f64 = 0.95;

/// The distribution of one quantity, in its SI unit.
#[derive(Debug, Clone, PartialEq)]
pub struct Distribution(Shape);

/// The kinds of distribution with their parameters.
#[derive(Debug, Clone, PartialEq)]
pub enum Shape {
    /// Always the same value.
    Fixed(f64),
    /// Gauss.
    Normal {
        /// Mean.
        mean: f64,
        /// Standard deviation.
        sd: f64,
    },
    /// Gauss cut at both ends, as inspection leaves it.
    TruncatedNormal {
        /// Mean of the parent before it is cut.
        mean: f64,
        /// Standard deviation of the parent.
        sd: f64,
        /// Lower cut.
        low: f64,
        /// Upper cut.
        high: f64,
    },
    /// Every value within the limits alike.
    Uniform {
        /// Lower limit.
        low: f64,
        /// Upper limit.
        high: f64,
    },
    /// Azzalini's skew normal, 2 φ(z) Φ(a z)/w with z = (x − x0)/w.
    SkewNormal {
        /// Location x0.
        location: f64,
        /// Scale w.
        scale: f64,
        /// Shape a.
        shape: f64,
    },
    /// Measured values, each as likely as its count says; in rising order.
    Measured(Vec<Atom>),
}

/// A value that occurs with a share of its own.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Atom {
    /// The value.
    pub value: f64,
    /// Its share; all shares add up to 1.
    pub share: f64,
}

impl Distribution {
    /// Always `value`.
    ///
    /// # Errors
    /// A value that is not finite.
    pub fn fixed(value: f64) -> Result<Self, DistributionError> {
        finite("value", value)?;
        Ok(Self(Shape::Fixed(value)))
    }

    /// A normal distribution.
    ///
    /// # Errors
    /// A standard deviation that is not above zero, numbers not finite.
    ///
    /// # Example
    /// ```
    /// use hubgrip::population::distribution::Distribution;
    /// let bore = Distribution::normal(12e-6, 4e-6)?;
    /// assert_eq!((bore.mean(), bore.sd()), (12e-6, 4e-6));
    /// # Ok::<(), hubgrip::population::distribution::DistributionError>(())
    /// ```
    pub fn normal(mean: f64, sd: f64) -> Result<Self, DistributionError> {
        finite("mean", mean)?;
        positive("standard deviation", sd)?;
        Ok(Self(Shape::Normal { mean, sd }))
    }

    /// A normal cut at `low` and `high`; mean and standard deviation are those of the parent.
    ///
    /// # Errors
    /// Cuts out of order, or cuts that leave less than a millionth of the parent.
    pub fn truncated_normal(mean: f64, sd: f64, low: f64, high: f64) -> Result<Self, DistributionError> {
        finite("mean", mean)?;
        positive("standard deviation", sd)?;
        ordered(low, high)?;
        let left = normal::between((low - mean) / sd, (high - mean) / sd);
        if left < 1e-6 {
            return Err(DistributionError::NothingLeft { low, high });
        }
        Ok(Self(Shape::TruncatedNormal { mean, sd, low, high }))
    }

    /// Every value from `low` to `high` alike.
    ///
    /// # Errors
    /// Limits out of order or not finite.
    pub fn uniform(low: f64, high: f64) -> Result<Self, DistributionError> {
        ordered(low, high)?;
        Ok(Self(Shape::Uniform { low, high }))
    }

    /// A skew normal of this mean, standard deviation and skewness (third standardised moment).
    ///
    /// Source: A. Azzalini, *A Class of Distributions which Includes the Normal Ones*, Scandinavian Journal of
    /// Statistics 12 (1985) 171–178.
    ///
    /// # Errors
    /// A skewness beyond ±[`MOST_SKEWNESS`], a standard deviation not above zero.
    pub fn skewed(mean: f64, sd: f64, skewness: f64) -> Result<Self, DistributionError> {
        finite("mean", mean)?;
        positive("standard deviation", sd)?;
        if !skewness.is_finite() || skewness.abs() > MOST_SKEWNESS {
            return Err(DistributionError::Skewness { given: skewness });
        }
        if skewness == 0.0 {
            return Self::normal(mean, sd);
        }
        let pi = std::f64::consts::PI;
        let third = skewness.abs().powf(2.0 / 3.0);
        let ratio = ((4.0 - pi) / 2.0).powf(2.0 / 3.0);
        let delta = (pi / 2.0 * third / (third + ratio)).sqrt().copysign(skewness);
        let shape = delta / (1.0 - delta * delta).sqrt();
        let scale = sd / (1.0 - 2.0 * delta * delta / pi).sqrt();
        let location = mean - scale * delta * (2.0 / pi).sqrt();
        Ok(Self(Shape::SkewNormal { location, scale, shape }))
    }

    /// Measured values, all alike; equal ones are taken together.
    ///
    /// # Errors
    /// No value, or one that is not finite.
    pub fn measured(values: &[f64]) -> Result<Self, DistributionError> {
        if values.is_empty() {
            return Err(DistributionError::NoValues);
        }
        for value in values {
            finite("measured value", *value)?;
        }
        let mut sorted = values.to_vec();
        sorted.sort_by(f64::total_cmp);
        let each = 1.0 / sorted.len() as f64;
        let mut atoms: Vec<Atom> = Vec::with_capacity(sorted.len());
        for value in sorted {
            match atoms.last_mut() {
                Some(last) if last.value == value => last.share += each,
                _ => atoms.push(Atom { value, share: each }),
            }
        }
        Ok(if let [only] = atoms.as_slice() {
            Self(Shape::Fixed(only.value))
        } else {
            Self(Shape::Measured(atoms))
        })
    }

    /// A normal from the process capability against limits: s = (upper − lower)/(6 Cp), the mean so far from the
    /// nearer limit that Cpk = distance/(3 s).
    ///
    /// `towards_upper` says to which limit the mean has moved. Source: ISO 22514-2; D. C. Montgomery,
    /// *Introduction to Statistical Quality Control*, chapter on process capability.
    ///
    /// # Errors
    /// Cp not above zero, Cpk above Cp, limits out of order.
    ///
    /// # Example
    /// ```
    /// use hubgrip::population::distribution::Distribution;
    /// let bore = Distribution::capable(0.0, 30e-6, 1.25, 1.0, true)?;
    /// assert!((bore.sd() - 4e-6).abs() < 1e-18);
    /// assert!((bore.mean() - 18e-6).abs() < 1e-18);
    /// # Ok::<(), hubgrip::population::distribution::DistributionError>(())
    /// ```
    pub fn capable(
        lower: f64,
        upper: f64,
        cp: f64,
        cpk: f64,
        towards_upper: bool,
    ) -> Result<Self, DistributionError> {
        ordered(lower, upper)?;
        positive("Cp", cp)?;
        finite("Cpk", cpk)?;
        if cpk > cp {
            return Err(DistributionError::CpkAboveCp { cp, cpk });
        }
        let sd = (upper - lower) / (6.0 * cp);
        let shift = 3.0 * sd * (cp - cpk);
        let middle = 0.5 * (lower + upper);
        Self::normal(if towards_upper { middle + shift } else { middle - shift }, sd)
    }

    /// Kind and parameters.
    pub fn shape(&self) -> &Shape {
        &self.0
    }

    /// The value when it does not scatter.
    pub fn only_value(&self) -> Option<f64> {
        match self.0 {
            Shape::Fixed(value) => Some(value),
            _ => None,
        }
    }

    /// The same distribution of the quantity plus `by`.
    pub fn shifted(&self, by: f64) -> Self {
        Self(match &self.0 {
            Shape::Fixed(value) => Shape::Fixed(value + by),
            Shape::Normal { mean, sd } => Shape::Normal { mean: mean + by, sd: *sd },
            Shape::TruncatedNormal { mean, sd, low, high } => {
                Shape::TruncatedNormal { mean: mean + by, sd: *sd, low: low + by, high: high + by }
            }
            Shape::Uniform { low, high } => Shape::Uniform { low: low + by, high: high + by },
            Shape::SkewNormal { location, scale, shape } => {
                Shape::SkewNormal { location: location + by, scale: *scale, shape: *shape }
            }
            Shape::Measured(atoms) => Shape::Measured(
                atoms.iter().map(|atom| Atom { value: atom.value + by, share: atom.share }).collect(),
            ),
        })
    }

    /// Mean.
    pub fn mean(&self) -> f64 {
        match &self.0 {
            Shape::Fixed(value) => *value,
            Shape::Normal { mean, .. } => *mean,
            Shape::TruncatedNormal { mean, sd, low, high } => {
                mean + sd * normal::truncated_moments((low - mean) / sd, (high - mean) / sd).0
            }
            Shape::Uniform { low, high } => 0.5 * (low + high),
            Shape::SkewNormal { location, scale, shape } => {
                location + scale * delta_of(*shape) * (2.0 / std::f64::consts::PI).sqrt()
            }
            Shape::Measured(atoms) => atoms.iter().map(|atom| atom.share * atom.value).sum(),
        }
    }

    /// Standard deviation; of measured values that of the values themselves.
    pub fn sd(&self) -> f64 {
        match &self.0 {
            Shape::Fixed(_) => 0.0,
            Shape::Normal { sd, .. } => *sd,
            Shape::TruncatedNormal { mean, sd, low, high } => {
                sd * normal::truncated_moments((low - mean) / sd, (high - mean) / sd).1.sqrt()
            }
            Shape::Uniform { low, high } => (high - low) / 12f64.sqrt(),
            Shape::SkewNormal { scale, shape, .. } => {
                let delta = delta_of(*shape);
                scale * (1.0 - 2.0 * delta * delta / std::f64::consts::PI).sqrt()
            }
            Shape::Measured(atoms) => {
                let mean = self.mean();
                atoms.iter().map(|atom| atom.share * (atom.value - mean).powi(2)).sum::<f64>().sqrt()
            }
        }
    }

    /// Least and greatest value; an endless tail is cut [`REACH`] standard deviations out.
    pub fn support(&self) -> (f64, f64) {
        match &self.0 {
            Shape::Fixed(value) => (*value, *value),
            Shape::Normal { mean, sd } => (mean - REACH * sd, mean + REACH * sd),
            Shape::TruncatedNormal { mean, sd, low, high } => {
                (low.max(mean - REACH * sd), high.min(mean + REACH * sd))
            }
            Shape::Uniform { low, high } => (*low, *high),
            Shape::SkewNormal { location, scale, .. } => (location - REACH * scale, location + REACH * scale),
            Shape::Measured(atoms) => {
                (atoms.first().map_or(0.0, |atom| atom.value), atoms.last().map_or(0.0, |atom| atom.value))
            }
        }
    }

    /// Density at `x` within the support; zero for values that come one by one.
    pub fn density(&self, x: f64) -> f64 {
        match &self.0 {
            Shape::Fixed(_) | Shape::Measured(_) => 0.0,
            Shape::Normal { mean, sd } => normal::density((x - mean) / sd) / sd,
            Shape::TruncatedNormal { mean, sd, low, high } => {
                if x < *low || x > *high {
                    return 0.0;
                }
                normal::density((x - mean) / sd)
                    / (sd * normal::between((low - mean) / sd, (high - mean) / sd))
            }
            Shape::Uniform { low, high } => {
                if x < *low || x > *high {
                    0.0
                } else {
                    1.0 / (high - low)
                }
            }
            Shape::SkewNormal { location, scale, shape } => {
                let z = (x - location) / scale;
                2.0 * normal::density(z) * normal::below(shape * z) / scale
            }
        }
    }
}

/// δ = a/√(1 + a²) of the skew normal.
pub(crate) fn delta_of(shape: f64) -> f64 {
    shape / (1.0 + shape * shape).sqrt()
}

fn finite(what: &'static str, given: f64) -> Result<(), DistributionError> {
    if given.is_finite() { Ok(()) } else { Err(DistributionError::NotFinite { what }) }
}

fn positive(what: &'static str, given: f64) -> Result<(), DistributionError> {
    finite(what, given)?;
    if given > 0.0 { Ok(()) } else { Err(DistributionError::NotPositive { what, given }) }
}

fn ordered(low: f64, high: f64) -> Result<(), DistributionError> {
    finite("limit", low)?;
    finite("limit", high)?;
    if low < high { Ok(()) } else { Err(DistributionError::LimitsReversed { low, high }) }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_skew_normal_has_the_moments_it_was_asked_for() {
        let skewed = Distribution::skewed(5.0, 2.0, -0.6).unwrap();
        let (low, high) = skewed.support();
        let steps = 200_000;
        let width = (high - low) / f64::from(steps);
        let moment = |power: i32, about: f64| -> f64 {
            (0..steps)
                .map(|step| low + (f64::from(step) + 0.5) * width)
                .map(|x| skewed.density(x) * (x - about).powi(power) * width)
                .sum()
        };
        approx::assert_relative_eq!(moment(1, 0.0), 5.0, max_relative = 1e-9);
        approx::assert_relative_eq!(moment(2, 5.0), 4.0, max_relative = 1e-9);
        approx::assert_relative_eq!(moment(3, 5.0) / 8.0, -0.6, max_relative = 1e-8);
    }

    #[test]
    fn equal_measured_values_are_one() {
        let measured = Distribution::measured(&[2.0, 1.0, 2.0, 4.0]).unwrap();
        let Shape::Measured(atoms) = measured.shape() else { panic!("not measured") };
        assert_eq!(atoms.len(), 3);
        assert_eq!(atoms[1], Atom { value: 2.0, share: 0.5 });
        assert_eq!(measured.mean(), 2.25);
    }

    #[test]
    fn what_makes_no_sense_is_refused() {
        assert!(Distribution::normal(0.0, 0.0).is_err());
        assert!(Distribution::uniform(1.0, 1.0).is_err());
        assert!(Distribution::truncated_normal(0.0, 1.0, 8.0, 9.0).is_err());
        assert!(Distribution::skewed(0.0, 1.0, 1.2).is_err());
        assert!(Distribution::measured(&[]).is_err());
        assert!(Distribution::capable(0.0, 1.0, 1.0, 1.3, true).is_err());
        assert!(Distribution::fixed(f64::NAN).is_err());
    }
}
