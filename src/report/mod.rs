//! What is shown of the findings: HTML with drawings and plots.

pub mod drawing;
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
            let drawing = super::drawing::section(&findings);
            let mut out = format!(
                "<!DOCTYPE html><html><head><meta charset='utf-8'/></head><body style='background:#fff'><div>{}<p>{}</p></div>",
                drawing.svg.into_string(),
                drawing.caption
            );
            let plots = [
                Some(super::plot::tolerance_zones(&findings)),
                Some(super::plot::stress(&findings)),
                super::plot::press_force(&findings),
                super::plot::diameters(&findings),
            ];
            for plot in plots.into_iter().flatten() {
                out.push_str(&format!(
                    "<div><h3>{}</h3>{}<p>{}</p></div>",
                    plot.title,
                    plot.svg.into_string(),
                    plot.caption
                ));
            }
            out.push_str("</body></html>");
            std::fs::write(format!("/tmp/gfx/{name}.html"), out).unwrap();
        }
    }
}
