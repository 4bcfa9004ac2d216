//! Pure formulas of the thick-walled cylinder: one ring, a stack of rings, strength, capacity.
//!
//! All numbers are SI (m, Pa, N, N·m, rad/s, K). Interference is diametral. Plane stress, σz = 0.

pub mod capacity;
pub mod criteria;
mod error;
pub mod governing;
pub mod influence;
pub mod plastic;
pub mod ring;
pub mod rotation;
pub mod stack;
pub mod two_rings;

pub use error::MechanicsError;
