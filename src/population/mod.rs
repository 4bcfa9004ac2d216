//! Many joints from one: which fit to choose, what a whole table of joints does.
//!
//! | module | subject |
//! |---|---|
//! | [`batch`] | a table of joints, one row a joint, streamed |
//! | [`mod@choose`] | which standard fits meet the requirements, ranked |
//! | [`kernel`] | a joint of two rings prepared once and evaluated without allocation |

pub mod batch;
pub mod choose;
pub mod kernel;
