//! What is shown of the findings: HTML with drawings and plots.

pub mod drawing;
pub mod html;
pub mod mathml;
pub mod plot;

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
