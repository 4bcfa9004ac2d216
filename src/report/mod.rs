//! What is shown of the findings: HTML with drawings and plots.

pub mod bearing;
pub mod choose;
pub mod diagnostics;
pub mod drawing;
pub mod html;
pub mod json;
pub mod limits;
pub mod materials;
pub mod mathml;
pub mod plot;
pub mod pressing;
pub mod scatter;
pub mod seating;
pub mod service;
pub mod sort;
pub mod terminal;

mod hatch;
mod page;
mod svg;
mod text_width;
mod typeset;
mod units;

#[cfg(test)]
mod figure_tests;
#[cfg(test)]
mod lettering;
#[cfg(test)]
mod page_tests;
#[cfg(test)]
mod sample;
#[cfg(test)]
mod well_formed;
