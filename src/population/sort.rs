//! Selective assembly: coarse parts sorted into groups that mate, so that a coarse tolerance gives a fine fit.
//!
//! [`groups`] sorts two distributions (or two measured lots) into groups; [`matching`] pairs two measured lots one
//! by one, as many as can be paired within the band.

pub mod groups;
pub mod matching;

use thiserror::Error;

use crate::joint::Joint;
use crate::material::Range;
use crate::population::choose::judge::Judge;
use crate::population::distribution::DistributionError;
use crate::population::kernel::KernelError;

/// Sizes closer than this are the same, m: far below any measurement, far above rounding.
pub const SAME: f64 = 1e-12;

/// Most groups.
pub const MOST_GROUPS: usize = 100;

/// Why parts cannot be sorted.
#[derive(Debug, Clone, PartialEq, Error)]
pub enum SortError {
    /// The number of groups is out of range.
    #[error("{given} groups were asked for: 1 to {MOST_GROUPS} are possible")]
    Groups {
        /// What was asked for.
        given: usize,
    },
    /// The limits of a group do not rise, or holes and shafts have different numbers of groups.
    #[error("the limits of the groups must rise, and be as many for the holes as for the shafts")]
    Edges,
    /// The band is empty.
    #[error("the band must have its lower end below its upper: {low} m is followed by {high} m")]
    Band {
        /// Lower end, m.
        low: f64,
        /// Upper end, m.
        high: f64,
    },
    /// All holes or all shafts lie outside the limits.
    #[error("no {0} lies within its limits")]
    NothingWithin(&'static str),
    /// A distribution was refused.
    #[error(transparent)]
    Distribution(#[from] DistributionError),
}

/// The band of interference (m) in which a joint meets its requirements: what `choose` finds as the allowed window, for
/// the loosest pair at its lower end and for the tightest at its upper.
///
/// An end that nothing requires is none; where no interference meets them all, the ends do not rise. A handling time has
/// no edge and is not counted.
///
/// # Errors
/// The joint is not a plain joint of two rings.
pub fn required_band(joint: &Joint) -> Result<(Option<f64>, Option<f64>), KernelError> {
    let window = Judge::window(&Judge::of(joint)?.requirements());
    Ok((Some(window.least).filter(|least| *least != f64::NEG_INFINITY), window.greatest))
}

/// Checks a band.
///
/// # Errors
/// Its ends do not rise.
pub fn checked_band(band: Range) -> Result<Range, SortError> {
    if band.low < band.high { Ok(band) } else { Err(SortError::Band { low: band.low, high: band.high }) }
}
