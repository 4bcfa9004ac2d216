//! Pure formulas of the thick-walled cylinder, elastic:
//!
//! | module | subject |
//! |---|---|
//! | [`ring`] | stress and displacement of one ring by pressure, rotation and temperature |
//! | [`two_rings`] | a hub on a shaft in closed form |
//! | [`stack`] | any number of rings, whose interfaces may open |
//! | [`influence`] | the matrix that ties gaps to pressures |
//! | [`governing`] | which end of each interference governs a pressure or a stress |
//! | [`rotation`], [`temperature`] | where an interface loosens; heat flow through a ring |
//! | [`criteria`], [`capacity`] | strength criteria; torque and axial force at slip |
//! | [`slices`] | a stepped hub or shaft, disc by disc |
//! | [`bending`] | bending moment and radial force |
//! | [`buckling`] | a thin liner pressed inwards |
//! | [`finite_length`], [`notch`] | what the edges add: mean and edge pressure, the notch |
//! | [`fatigue`] | what size and surface take from the fatigue strength |
//!
//! All numbers are SI (m, Pa, N, N·m, rad/s, K). Interference is diametral. Plane stress, σz = 0.

pub mod bending;
pub mod buckling;
pub mod capacity;
pub mod criteria;
mod error;
pub mod fatigue;
pub mod finite_length;
pub mod governing;
pub mod influence;
pub mod notch;
pub mod plastic;
pub mod ring;
pub mod rotation;
pub mod slices;
pub mod stack;
pub mod temperature;
pub mod two_rings;

pub use error::MechanicsError;
