//! A hub that yields: perfect plasticity in plane stress, at rest, on an elastic shaft.

mod growth;
mod hub;
pub mod tresca;
pub mod von_mises;

pub use hub::{HubElasticity, HubLimit, HubLimitKind};
