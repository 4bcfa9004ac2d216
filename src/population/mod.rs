//! Many joints from one: which fit to choose, what a whole table of joints does.
//!
//! | module | subject |
//! |---|---|
//! | [`mod@choose`] | which standard fits meet the requirements, ranked |
//! | [`kernel`] | a joint of two rings prepared once and evaluated without allocation |

pub mod choose;
pub mod kernel;
