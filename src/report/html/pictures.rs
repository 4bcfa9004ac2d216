//! The section drawing and the plots, each with what to see.

use maud::{Markup, html};

use super::Sheet;
use crate::report::{drawing, plot};

/// The drawing.
pub(super) fn section(sheet: Sheet) -> Markup {
    let drawing = drawing::section(sheet.findings);
    html! { figure { (drawing.svg) figcaption { (drawing.caption) } } }
}

/// The plots.
pub(super) fn plots(sheet: Sheet) -> Markup {
    let findings = sheet.findings;
    let plots = [
        Some(plot::tolerance_zones(findings)),
        plot::stress(findings),
        plot::along(findings),
        plot::press_force(findings),
        plot::diameters(findings),
        plot::handling(findings),
        plot::envelope(findings),
    ];
    html! {
        p.key {
            "In every picture the tightest pair is the " span.tightest { "solid line with the filled mark ●" }
            ", the loosest the " span.loosest { "dashed line with the open mark ○" } "."
        }
        @for plot in plots.into_iter().flatten() {
            figure {
                h3 { (plot.title) }
                (plot.svg)
                figcaption { (plot.caption) }
            }
        }
    }
}
