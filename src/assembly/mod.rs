//! How the joint is put together: press force along the travel, joining temperatures, cautions.
//!
//! All numbers are SI (m, Pa, N, J, K, s, kg). Interference and clearance are diametral; interference is
//! shaft minus hole, positive when it grips.

pub mod cautions;
pub mod error;
pub mod joining;
pub mod press;
pub mod thermal;

pub use error::AssemblyError;
