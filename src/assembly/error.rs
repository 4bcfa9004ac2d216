//! Why an assembly step cannot be computed.

use thiserror::Error;

use crate::numerics::interpolation::InterpolationError;
use crate::numerics::root::RootError;

/// Why an assembly step cannot be computed, with the numbers that stand in the way.
///
/// Fields are SI; the messages give temperatures in °C and lengths in µm.
#[derive(Debug, Clone, PartialEq, Error)]
pub enum AssemblyError {
    /// An input lies outside the range in which the formula holds.
    #[error("{quantity} is {given}, but it must be {allowed}")]
    OutsideRange {
        /// Which input, with its unit.
        quantity: &'static str,
        /// What was given.
        given: f64,
        /// What is allowed.
        allowed: &'static str,
    },
    /// The expansion curve ends before the wanted clearance opens.
    #[error(
        "the expansion curve of the {part} ends at {:.1} °C, where the clearance is {:.1} µm; {:.1} µm is wanted",
        celsius(*.end), micrometres(*.clearance), micrometres(*.wanted)
    )]
    CurveEnds {
        /// `hub` or `shaft`.
        part: &'static str,
        /// End of the curve, K.
        end: f64,
        /// Diametral clearance there, m.
        clearance: f64,
        /// Diametral clearance wanted, m.
        wanted: f64,
    },
    /// The wanted clearance is exceeded over the whole expansion curve, so no temperature gives just that.
    #[error(
        "the clearance is never as small as {:.1} µm: over the whole expansion curve of the {part} it is at least {:.1} µm",
        micrometres(*.wanted), micrometres(*.least)
    )]
    AlwaysClear {
        /// `hub` or `shaft`.
        part: &'static str,
        /// Least diametral clearance over the curve, m.
        least: f64,
        /// Diametral clearance wanted, m.
        wanted: f64,
    },
    /// A temperature lies outside the expansion curve of a part.
    #[error(
        "{:.1} °C is outside the expansion curve of the {part}, which runs from {:.1} to {:.1} °C",
        celsius(*.given), celsius(*.from), celsius(*.to)
    )]
    OutsideCurve {
        /// `hub` or `shaft`.
        part: &'static str,
        /// Start of the curve, K.
        from: f64,
        /// End of the curve, K.
        to: f64,
        /// The temperature asked for, K.
        given: f64,
    },
    /// A standard's table has no row for a size.
    #[error("{table} has no row for {} mm", *.given * 1e3)]
    NotInTable {
        /// The standard.
        table: &'static str,
        /// The size asked for, m.
        given: f64,
    },
    /// A transient could not be followed any further.
    #[error("the temperatures could not be followed beyond {time} s")]
    NotSettled {
        /// Time reached, s.
        time: f64,
    },
    /// A temperature lies on the wrong side: the surroundings can never bring the part there.
    #[error(
        "a part at {:.1} °C in surroundings at {:.1} °C never reaches {:.1} °C",
        celsius(*.start), celsius(*.surroundings), celsius(*.wanted)
    )]
    NeverReached {
        /// Temperature of the part at the start, K.
        start: f64,
        /// Temperature of the surroundings, K.
        surroundings: f64,
        /// Temperature wanted, K.
        wanted: f64,
    },
    /// A table could not be built or read.
    #[error(transparent)]
    Table(#[from] InterpolationError),
    /// A root was not found.
    #[error(transparent)]
    Root(#[from] RootError),
}

fn celsius(kelvin: f64) -> f64 {
    kelvin - 273.15
}

fn micrometres(metres: f64) -> f64 {
    metres * 1e6
}

/// `given` when `ok`, else [`AssemblyError::OutsideRange`].
pub(crate) fn require(
    ok: bool,
    quantity: &'static str,
    given: f64,
    allowed: &'static str,
) -> Result<f64, AssemblyError> {
    if ok { Ok(given) } else { Err(AssemblyError::OutsideRange { quantity, given, allowed }) }
}

/// `given` when it is finite and greater than zero.
pub(crate) fn positive(quantity: &'static str, given: f64) -> Result<f64, AssemblyError> {
    require(given.is_finite() && given > 0.0, quantity, given, "greater than zero")
}

/// `given` when it is finite and not below zero.
pub(crate) fn not_negative(quantity: &'static str, given: f64) -> Result<f64, AssemblyError> {
    require(given.is_finite() && given >= 0.0, quantity, given, "zero or more")
}

/// `given` when it is finite.
pub(crate) fn finite(quantity: &'static str, given: f64) -> Result<f64, AssemblyError> {
    require(given.is_finite(), quantity, given, "a finite number")
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn messages_carry_what_was_given_and_what_is_allowed() {
        let error = positive("joint length (m)", -0.04).unwrap_err();
        assert_eq!(error.to_string(), "joint length (m) is -0.04, but it must be greater than zero");
        let ends = AssemblyError::CurveEnds { part: "hub", end: 573.15, clearance: 12e-6, wanted: 60e-6 };
        assert_eq!(
            ends.to_string(),
            "the expansion curve of the hub ends at 300.0 °C, where the clearance is 12.0 µm; 60.0 µm is wanted"
        );
        assert!(not_negative("friction", f64::NAN).is_err());
    }
}
