//! Placeholder, to be filled.
