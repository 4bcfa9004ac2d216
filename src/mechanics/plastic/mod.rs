//! A hub that yields: perfect plasticity in plane stress, at rest, on an elastic shaft.

mod hub;
pub mod tresca;

pub use hub::{HubElasticity, HubLimit, HubLimitKind};
