//! Press-fit and shrink-fit joints: limits and extremes, thick-walled-cylinder mechanics, assembly.
//!
//! Data flows one way through the modules, in this order; no module uses one that stands below it:
//!
//! | module | subject |
//! |---|---|
//! | [`numerics`] | a bracketed root, interpolation in a table |
//! | [`diagnostic`] | what is said about bad input, with file, line and column |
//! | [`quantity`] | text with units in, SI numbers out, and back for display |
//! | [`tolerance`] | ISO 286, ANSI B4.1, explicit and measured sizes; limits and extremes |
//! | [`material`] | the material library, expansion curves, friction |
//! | [`mechanics`] | pure formulas: one ring, a stack of rings, strength criteria, capacity |
//! | [`assembly`] | press force along the travel, joining temperatures, cautions |
//! | [`joint`] | the joint file: shape, defaults, errors with line and column |
//! | [`findings`] | what is computed, in one place; verdicts; the worksheet |
//! | [`pressing`] | a recorded press-in force judged against what the joint allows |
//! | [`population`] | many joints: the fit to choose, a population of parts, a table of joints |
//! | [`report`] | terminal text, JSON, HTML, drawings and plots |
//!
//! Everything below `joint` takes and returns SI numbers (m, Pa, N, N·m, K, kg, s, rad/s).
#![forbid(unsafe_code)]
#![deny(missing_docs)]

pub mod assembly;
pub mod diagnostic;
pub mod findings;
pub mod joint;
pub mod material;
pub mod mechanics;
pub mod numerics;
pub mod population;
pub mod pressing;
pub mod quantity;
pub mod report;
pub mod tolerance;
