//! Many joints from one: which fit to choose, what a population of parts does, what a whole table of joints does.
//!
//! | module | subject |
//! |---|---|
//! | [`batch`] | a table of joints, one row a joint, streamed |
//! | [`mod@choose`] | which standard fits meet the requirements, ranked |
//! | [`kernel`] | a joint of two rings prepared once and evaluated without allocation |
//! | [`distribution`] | how a size, a coefficient or a modulus scatters |
//! | [`integration`] | distributions added, multiplied and integrated, far into the tails |
//! | [`monte_carlo`] | random pairs, the same from a seed on any number of threads |
//! | [`scatter`] | interference, pressure, stress, capacity of a population; chance of slip and of yield |
//! | [`sort`] | selective assembly: groups, mates, exact matching of measured parts |

pub mod batch;
pub mod choose;
pub mod distribution;
pub mod integration;
pub mod kernel;
pub mod monte_carlo;
pub mod scatter;
pub mod sort;
