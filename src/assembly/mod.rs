//! How the joint is put together: press force along the travel, joining temperatures, cautions.

pub mod press;
