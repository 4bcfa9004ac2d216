//! What is shown of the findings: HTML with drawings and plots.

pub mod choose;
pub mod diagnostics;
pub mod drawing;
pub mod json;
pub mod limits;
pub mod materials;
pub mod html;
pub mod mathml;
pub mod plot;
pub mod terminal;

mod hatch;
mod svg;
mod text_width;
mod typeset;
mod units;

#[cfg(test)]
mod sample;
#[cfg(test)]
mod dump {
    #[test]
    fn dump() {
        for (name, findings) in super::sample::all() {
            std::fs::write(format!("/tmp/gfx/{name}.html"), super::html::html(&findings)).unwrap();
        }
    }
}
