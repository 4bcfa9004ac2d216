//! Fits that the standards prefer, to choose from before any other.

use std::fmt;

use super::class::{Grade, Letter, ToleranceClass};
use crate::tolerance::Member;

/// A hole class and a shaft class.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct PreferredFit {
    /// Class of the hole.
    pub hole: ToleranceClass,
    /// Class of the shaft.
    pub shaft: ToleranceClass,
}

impl fmt::Display for PreferredFit {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.pad(&format!("{}/{}", self.hole, self.shaft))
    }
}

/// Preferred metric fits of ANSI B4.2-1978, hole basis first; from memory.
///
/// # Example
/// ```
/// use hubgrip::tolerance::iso286::PREFERRED_FITS_ANSI_B4_2;
/// assert!(PREFERRED_FITS_ANSI_B4_2.iter().any(|fit| fit.to_string() == "H7/s6"));
/// ```
pub const PREFERRED_FITS_ANSI_B4_2: [PreferredFit; 19] = [
    fit(Letter::H, 11, Letter::C, 11),
    fit(Letter::H, 9, Letter::D, 9),
    fit(Letter::H, 8, Letter::F, 7),
    fit(Letter::H, 7, Letter::G, 6),
    fit(Letter::H, 7, Letter::H, 6),
    fit(Letter::H, 7, Letter::K, 6),
    fit(Letter::H, 7, Letter::N, 6),
    fit(Letter::H, 7, Letter::P, 6),
    fit(Letter::H, 7, Letter::S, 6),
    fit(Letter::H, 7, Letter::U, 6),
    fit(Letter::C, 11, Letter::H, 11),
    fit(Letter::D, 9, Letter::H, 9),
    fit(Letter::F, 8, Letter::H, 7),
    fit(Letter::G, 7, Letter::H, 6),
    fit(Letter::K, 7, Letter::H, 6),
    fit(Letter::N, 7, Letter::H, 6),
    fit(Letter::P, 7, Letter::H, 6),
    fit(Letter::S, 7, Letter::H, 6),
    fit(Letter::U, 7, Letter::H, 6),
];

/// Preferred fits of ISO 286-1:2010, clause 8 (figures of the hole-basis and the shaft-basis system), hole
/// basis first; from memory, so confirm a fit against the standard before calling it preferred.
pub const PREFERRED_FITS_ISO_286_1: [PreferredFit; 78] = [
    fit(Letter::H, 6, Letter::G, 5),
    fit(Letter::H, 6, Letter::H, 5),
    fit(Letter::H, 6, Letter::Js, 5),
    fit(Letter::H, 6, Letter::K, 5),
    fit(Letter::H, 6, Letter::M, 5),
    fit(Letter::H, 6, Letter::N, 5),
    fit(Letter::H, 6, Letter::P, 5),
    fit(Letter::H, 7, Letter::F, 6),
    fit(Letter::H, 7, Letter::G, 6),
    fit(Letter::H, 7, Letter::H, 6),
    fit(Letter::H, 7, Letter::Js, 6),
    fit(Letter::H, 7, Letter::K, 6),
    fit(Letter::H, 7, Letter::M, 6),
    fit(Letter::H, 7, Letter::N, 6),
    fit(Letter::H, 7, Letter::P, 6),
    fit(Letter::H, 7, Letter::R, 6),
    fit(Letter::H, 7, Letter::S, 6),
    fit(Letter::H, 7, Letter::T, 6),
    fit(Letter::H, 7, Letter::U, 6),
    fit(Letter::H, 7, Letter::X, 6),
    fit(Letter::H, 8, Letter::E, 7),
    fit(Letter::H, 8, Letter::F, 7),
    fit(Letter::H, 8, Letter::H, 7),
    fit(Letter::H, 8, Letter::Js, 7),
    fit(Letter::H, 8, Letter::K, 7),
    fit(Letter::H, 8, Letter::M, 7),
    fit(Letter::H, 8, Letter::S, 7),
    fit(Letter::H, 8, Letter::U, 7),
    fit(Letter::H, 8, Letter::D, 8),
    fit(Letter::H, 8, Letter::E, 8),
    fit(Letter::H, 8, Letter::F, 8),
    fit(Letter::H, 8, Letter::H, 8),
    fit(Letter::H, 9, Letter::D, 8),
    fit(Letter::H, 9, Letter::E, 8),
    fit(Letter::H, 9, Letter::F, 8),
    fit(Letter::H, 9, Letter::H, 8),
    fit(Letter::H, 10, Letter::B, 9),
    fit(Letter::H, 10, Letter::C, 9),
    fit(Letter::H, 10, Letter::D, 9),
    fit(Letter::H, 10, Letter::E, 9),
    fit(Letter::H, 10, Letter::H, 9),
    fit(Letter::H, 11, Letter::B, 11),
    fit(Letter::H, 11, Letter::C, 11),
    fit(Letter::H, 11, Letter::D, 10),
    fit(Letter::H, 11, Letter::H, 10),
    fit(Letter::G, 6, Letter::H, 5),
    fit(Letter::Js, 6, Letter::H, 5),
    fit(Letter::K, 6, Letter::H, 5),
    fit(Letter::M, 6, Letter::H, 5),
    fit(Letter::N, 6, Letter::H, 5),
    fit(Letter::P, 6, Letter::H, 5),
    fit(Letter::F, 7, Letter::H, 6),
    fit(Letter::G, 7, Letter::H, 6),
    fit(Letter::Js, 7, Letter::H, 6),
    fit(Letter::K, 7, Letter::H, 6),
    fit(Letter::M, 7, Letter::H, 6),
    fit(Letter::N, 7, Letter::H, 6),
    fit(Letter::P, 7, Letter::H, 6),
    fit(Letter::R, 7, Letter::H, 6),
    fit(Letter::S, 7, Letter::H, 6),
    fit(Letter::T, 7, Letter::H, 6),
    fit(Letter::U, 7, Letter::H, 6),
    fit(Letter::X, 7, Letter::H, 6),
    fit(Letter::E, 8, Letter::H, 7),
    fit(Letter::F, 8, Letter::H, 7),
    fit(Letter::D, 9, Letter::H, 8),
    fit(Letter::E, 9, Letter::H, 8),
    fit(Letter::F, 9, Letter::H, 8),
    fit(Letter::E, 8, Letter::H, 9),
    fit(Letter::F, 8, Letter::H, 9),
    fit(Letter::H, 8, Letter::H, 9),
    fit(Letter::D, 9, Letter::H, 9),
    fit(Letter::E, 9, Letter::H, 9),
    fit(Letter::F, 9, Letter::H, 9),
    fit(Letter::H, 9, Letter::H, 9),
    fit(Letter::B, 11, Letter::H, 9),
    fit(Letter::C, 10, Letter::H, 9),
    fit(Letter::D, 10, Letter::H, 9),
];

const fn fit(hole: Letter, hole_grade: u8, shaft: Letter, shaft_grade: u8) -> PreferredFit {
    PreferredFit {
        hole: ToleranceClass { member: Member::Hole, letter: hole, grade: Grade::known(hole_grade) },
        shaft: ToleranceClass { member: Member::Shaft, letter: shaft, grade: Grade::known(shaft_grade) },
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::tolerance::iso286::Letter;

    #[test]
    fn every_preferred_fit_has_a_basis_and_is_defined_from_24_to_500_mm() {
        for fit in PREFERRED_FITS_ANSI_B4_2.iter().chain(&PREFERRED_FITS_ISO_286_1) {
            assert!(fit.hole.letter == Letter::H || fit.shaft.letter == Letter::H, "{fit}");
            for nominal in [0.025, 0.060, 0.500] {
                assert!(fit.hole.limits(nominal).is_ok() && fit.shaft.limits(nominal).is_ok(), "{fit}");
            }
        }
    }

    #[test]
    fn no_fit_is_listed_twice() {
        for list in [PREFERRED_FITS_ANSI_B4_2.as_slice(), &PREFERRED_FITS_ISO_286_1] {
            for (index, fit) in list.iter().enumerate() {
                assert!(!list[..index].contains(fit), "{fit}");
            }
        }
    }
}
