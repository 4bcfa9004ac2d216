//! Populations of parts: what many pairs do, not only the extreme ones.
//!
//! | module | subject |
//! |---|---|
//! | [`distribution`] | how a size, a coefficient or a modulus scatters |
//! | [`integration`] | distributions added, multiplied and integrated, far into the tails |
//! | [`monte_carlo`] | random pairs, the same from a seed on any number of threads |
//! | [`scatter`] | interference, pressure, stress, capacity of a population; chance of slip and of yield |
//! | [`sort`] | selective assembly: groups, mates, exact matching of measured parts |

pub mod distribution;
pub mod integration;
