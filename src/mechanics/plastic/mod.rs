//! A hub that yields: perfect plasticity in plane stress, at rest, on an elastic shaft.
//!
//! [`PlasticJoint`] is the entry: it takes a [`HubYield`], knows its [`PlasticLimits`], gives the [`PlasticState`]
//! at an interference and the pressure curve. [`tresca`] and [`von_mises`] hold the hubs by themselves, [`shaft`]
//! the shaft's limit.
//!
//! [`SpinningJoint`] says what rotation adds after Tresca.
//!
//! Not covered: hardening, a plastic shaft, joining a yielded hub again (its
//! interference is less by the permanent growth of the bore).

mod curve;
mod field;
mod growth;
mod hub;
mod joint;
mod rule;
pub mod shaft;
mod spinning;
mod state;
pub mod tresca;
pub mod von_mises;

pub use curve::{CurveEnd, CurvePoint, PressureCurve};
pub use field::HubPoint;
pub use hub::{HubElasticity, HubLimit, HubLimitKind};
pub use joint::{HubYield, PlasticJoint, PlasticLimits};
pub use rule::YieldRule;
pub use spinning::SpinningJoint;
pub use state::{COMMON_PLASTIC_SHARE, PermanentGrowth, PlasticState, Regime};
