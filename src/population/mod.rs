//! Many joints from one: which fit to choose, what a population of parts does, what a whole table of joints does.
//!
//! | module | subject |
//! |---|---|
//! | [`kernel`] | a joint of two rings prepared once and evaluated without allocation |
//! | [`distribution`] | how a size, a coefficient or a modulus scatters |
//! | [`integration`] | distributions added, multiplied and integrated, far into the tails |

pub mod distribution;
pub mod integration;
pub mod kernel;
