//! Limits of hole and shaft, and the extreme interferences of a fit.
//!
//! Interference is always diametral, shaft minus hole, positive when it grips; lengths are metres.
//!
//! | module | subject |
//! |---|---|
//! | [`iso286`] | tolerance classes of ISO 286, metric, to 3150 mm |
//! | [`ansi_b4_1`] | fit classes of ANSI B4.1, inch, to 19.69 in |
//! | [`callout`] | a fit as written, given or measured, resolved to limits at a nominal diameter |

pub mod ansi_b4_1;
pub mod callout;
mod error;
mod exact;
pub mod iso286;

pub use callout::{FitCallout, MemberCallout, Resolved, ResolvedMember};
pub use error::ToleranceError;

/// One value at each of the extreme pairs of parts and at the mean pair.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Extremes<T> {
    /// Largest hole with smallest shaft: the least-material pair.
    pub loosest: T,
    /// Middle of both tolerances.
    pub mean: T,
    /// Smallest hole with largest shaft: the maximum-material pair.
    pub tightest: T,
}

impl<T> Extremes<T> {
    /// The three values passed through a function.
    pub fn map<U>(self, mut function: impl FnMut(T) -> U) -> Extremes<U> {
        Extremes {
            loosest: function(self.loosest),
            mean: function(self.mean),
            tightest: function(self.tightest),
        }
    }

    /// References to the three values.
    pub fn as_ref(&self) -> Extremes<&T> {
        Extremes { loosest: &self.loosest, mean: &self.mean, tightest: &self.tightest }
    }

    /// The three values with their names, loosest first.
    pub fn named(&self) -> [(&'static str, &T); 3] {
        [("loosest", &self.loosest), ("mean", &self.mean), ("tightest", &self.tightest)]
    }
}

/// Lower and upper deviation from the nominal diameter, in metres.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Limits {
    /// Lower deviation, m.
    pub lower: f64,
    /// Upper deviation, m; never below the lower.
    pub upper: f64,
}

/// Which member of the fit is meant.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Member {
    /// The bore, the outer part.
    Hole,
    /// The shaft, the inner part.
    Shaft,
}

impl Member {
    /// The other member.
    pub fn other(self) -> Self {
        match self {
            Self::Hole => Self::Shaft,
            Self::Shaft => Self::Hole,
        }
    }
}

impl std::fmt::Display for Member {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        f.pad(match self {
            Self::Hole => "hole",
            Self::Shaft => "shaft",
        })
    }
}

/// One hole and one shaft of a fit, as deviations from the nominal diameter.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Pair {
    /// Deviation of the hole, m.
    pub hole: f64,
    /// Deviation of the shaft, m.
    pub shaft: f64,
}

impl Pair {
    /// Diametral interference of the pair, shaft minus hole, m; negative is clearance.
    pub fn interference(&self) -> f64 {
        exact::deviation_difference(self.shaft, self.hole)
    }
}

impl Limits {
    /// Width of the tolerance, upper minus lower deviation, m.
    pub fn width(&self) -> f64 {
        exact::deviation_difference(self.upper, self.lower)
    }

    /// Middle of the tolerance, m from the nominal diameter.
    pub fn middle(&self) -> f64 {
        0.5 * (self.lower + self.upper)
    }
}

/// Nominal diameter with the limits of hole and shaft.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct FitLimits {
    /// Nominal diameter, m.
    pub nominal: f64,
    /// Limits of the hole, m from nominal.
    pub hole: Limits,
    /// Limits of the shaft, m from nominal.
    pub shaft: Limits,
}

/// What the extremes say of a fit.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Character {
    /// Even the tightest pair has clearance or none at all.
    Clearance,
    /// The loosest pair has clearance, the tightest grips.
    Transition,
    /// Even the loosest pair grips or just touches.
    Interference,
}

impl FitLimits {
    /// Diametral interference of the loosest, mean and tightest pair, m.
    ///
    /// U = shaft deviation − hole deviation, taken from the deviations and not from the sizes, so that it
    /// keeps every digit.
    pub fn interference(&self) -> Extremes<f64> {
        let loosest = self.least_material().interference();
        let tightest = self.maximum_material().interference();
        Extremes { loosest, mean: 0.5 * (loosest + tightest), tightest }
    }

    /// The loosest, mean and tightest pair as deviations, m.
    pub fn pairs(&self) -> Extremes<Pair> {
        Extremes {
            loosest: self.least_material(),
            mean: Pair { hole: self.hole.middle(), shaft: self.shaft.middle() },
            tightest: self.maximum_material(),
        }
    }

    /// Smallest hole with largest shaft, both at their maximum-material limit (ISO 286-1): the tightest pair.
    pub fn maximum_material(&self) -> Pair {
        Pair { hole: self.hole.lower, shaft: self.shaft.upper }
    }

    /// Largest hole with smallest shaft, both at their least-material limit (ISO 286-1): the loosest pair.
    pub fn least_material(&self) -> Pair {
        Pair { hole: self.hole.upper, shaft: self.shaft.lower }
    }

    /// Clearance, transition or interference fit (ISO 286-1, clause 3.3).
    pub fn character(&self) -> Character {
        let interference = self.interference();
        if interference.tightest <= 0.0 {
            Character::Clearance
        } else if interference.loosest < 0.0 {
            Character::Transition
        } else {
            Character::Interference
        }
    }
}
