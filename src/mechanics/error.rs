//! Why a formula cannot be used.

use thiserror::Error;

use crate::numerics::interpolation::InterpolationError;
use crate::numerics::root::RootError;

/// An input outside the range in which a formula holds. Numbers are SI.
#[derive(Debug, Clone, PartialEq, Error)]
pub enum MechanicsError {
    /// A number lies outside what the formula allows.
    #[error("{quantity} is {given}, but it must be {allowed}")]
    OutsideRange {
        /// Which input, with its unit.
        quantity: &'static str,
        /// What was given.
        given: f64,
        /// What is allowed.
        allowed: &'static str,
    },
    /// Two rings that do not touch.
    #[error("ring {inner} ends at radius {ends} m, but the ring round it begins at {begins} m")]
    RingsDoNotMeet {
        /// Index of the inner ring.
        inner: usize,
        /// Its outer radius, m.
        ends: f64,
        /// The inner radius of the next ring, m.
        begins: f64,
    },
    /// Lists that do not fit the number of rings.
    #[error("{count} {what} were given for {rings} rings")]
    WrongCount {
        /// What was counted.
        what: &'static str,
        /// How many there are.
        count: usize,
        /// How many rings.
        rings: usize,
    },
    /// The shaft would yield.
    #[error(
        "the shaft yields at a contact pressure of {limit} Pa and the joint asks for {pressure} Pa; \
         a plastic shaft is not covered"
    )]
    ShaftYields {
        /// Contact pressure the joint asks for, Pa.
        pressure: f64,
        /// Contact pressure at which the shaft begins to yield, Pa.
        limit: f64,
    },
    /// A root was not found.
    #[error("{what} was not found: {reason}")]
    NotSolved {
        /// What was sought.
        what: &'static str,
        /// Why it was not found.
        reason: RootError,
    },
    /// A search that did not settle.
    #[error("{what} did not settle after {steps} steps")]
    NotSettled {
        /// What was sought.
        what: &'static str,
        /// Steps taken.
        steps: usize,
    },
    /// A root that was not found.
    #[error(transparent)]
    Root(#[from] RootError),
    /// A table that could not be read.
    #[error(transparent)]
    Interpolation(#[from] InterpolationError),
}
