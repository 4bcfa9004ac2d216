//! Selective assembly: coarse parts sorted into groups that mate, so that a coarse tolerance gives a fine fit.
//!
//! [`groups`] sorts two distributions (or two measured lots) into groups; [`matching`] pairs two measured lots one
//! by one, as many as can be paired within the band.

pub mod groups;
pub mod matching;

use thiserror::Error;

use crate::joint::{Joint, SmoothingAt};
use crate::material::{Kind, Range};
use crate::population::distribution::DistributionError;
use crate::population::kernel::{Condition, KernelError, PlainJoint};

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

/// The band of interference (m) in which a joint meets its requirements: least for the slip safety at the low
/// friction, with the loss by smoothing when it is taken for holding; greatest for the strength of every ring.
///
/// An end that nothing requires is none.
///
/// # Errors
/// The joint is not a plain joint of two rings.
pub fn required_band(joint: &Joint) -> Result<(Option<f64>, Option<f64>), KernelError> {
    let plain = PlainJoint::of(joint)?;
    let compliance = joint.diameter * plain.elasticity.flexibility();
    let loss = |taken: bool| if taken { plain.smoothing_loss } else { 0.0 };
    let holds = loss(joint.smoothing.at != SmoothingAt::None);
    let stresses = loss(joint.smoothing.at == SmoothingAt::Both);
    let least = plain
        .states
        .iter()
        .filter_map(|state| {
            let gain = state.relaxation * state.slip_safety_per_pressure?;
            Some(compliance * joint.require.slip_safety / gain - state.thermal_interference + holds)
        })
        .reduce(f64::max);
    let warmest = |conditions: &[Condition]| {
        conditions.iter().map(|c| c.thermal_interference).fold(plain.shop.thermal_interference, f64::max)
    };
    let greatest = joint
        .rings
        .iter()
        .zip([&plain.shaft, &plain.hub])
        .filter_map(|(ring, plain)| {
            let required = match ring.material.kind {
                Kind::Brittle => joint.require.fracture_safety,
                Kind::Ductile | Kind::Polymer => joint.require.yield_safety,
            };
            Some(plain.pressure_at_strength()? / required)
        })
        .reduce(f64::min)
        .map(|pressure| compliance * pressure - warmest(&plain.states) + stresses);
    Ok((least, greatest))
}

/// Checks a band.
///
/// # Errors
/// Its ends do not rise.
pub fn checked_band(band: Range) -> Result<Range, SortError> {
    if band.low < band.high { Ok(band) } else { Err(SortError::Band { low: band.low, high: band.high }) }
}
