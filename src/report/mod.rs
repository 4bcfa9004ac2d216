//! What is shown of the findings: HTML with drawings and plots.

pub mod mathml;

mod text_width;
mod typeset;
