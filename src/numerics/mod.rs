//! Small numerical tools that the physics modules share: a bracketed root and interpolation in a table.

pub mod interpolation;
pub mod root;
