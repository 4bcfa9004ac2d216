//! Limits of hole and shaft, and the extreme interferences of a fit.
//!
//! Interference is always diametral, shaft minus hole, positive when it grips; lengths are metres.

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
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Member {
    /// The bore, the outer part.
    Hole,
    /// The shaft, the inner part.
    Shaft,
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
    pub fn interference(&self) -> Extremes<f64> {
        let loosest = self.shaft.lower - self.hole.upper;
        let tightest = self.shaft.upper - self.hole.lower;
        Extremes { loosest, mean: 0.5 * (loosest + tightest), tightest }
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
