//! How the joint is put together: press force along the travel, joining temperatures, cautions.
//!
//! All numbers are SI (m, Pa, N, J, K, s, kg). Interference and clearance are diametral; interference is
//! shaft minus hole, positive when it grips.

pub mod atmosphere;
pub mod bearing;
pub mod bearing_tables;
pub mod boiling;
pub mod cautions;
pub mod conduction;
pub mod cryogen;
pub mod error;
pub mod film;
mod grid;
pub mod handling;
mod integrator;
pub mod joining;
mod pair;
pub mod press;
pub mod press_practice;
pub mod property;
pub mod release;
pub mod soak;
pub mod thermal;

pub use error::AssemblyError;
