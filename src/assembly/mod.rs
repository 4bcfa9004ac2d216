//! How the joint is put together: press force along the travel, joining temperatures, cautions.
//!
//! All numbers are SI (m, Pa, N, J, K, s, kg). Interference and clearance are diametral; interference is
//! shaft minus hole, positive when it grips.
//!
//! | question | module |
//! |---|---|
//! | What force along the travel, what press? | [`press`], [`press_practice`] |
//! | How hot the hub, how cold the shaft? | [`thermal`], [`joining`] |
//! | How long in the oven or bath? | [`soak`], [`conduction`], [`film`], [`media`], [`boiling`] |
//! | How long from there until it seizes? | [`handling`], [`air`], [`frost`] |
//! | How much coolant, and what of the air? | [`cryogen`], [`bath_liquid`], [`atmosphere`] |
//! | How does it come apart again? | [`press_practice`], [`release`], [`oil`] |
//! | What does the seat do to a bearing? | [`bearing`], [`bearing_tables`] |
//! | What must be minded? | [`cautions`] |

pub mod air;
pub mod atmosphere;
pub mod bath_liquid;
pub mod bearing;
pub mod bearing_tables;
pub mod boiling;
pub mod cautions;
pub mod conduction;
pub mod cryogen;
pub mod error;
pub mod film;
pub mod frost;
mod grid;
pub mod handling;
mod integrator;
pub mod joining;
pub mod media;
pub mod oil;
mod pair;
pub mod press;
pub mod press_practice;
pub mod property;
pub mod release;
pub mod soak;
pub mod thermal;

pub use error::AssemblyError;
