//! The population as one self-contained page with its plots.

use maud::{Markup, html as markup};

use super::{Told, agreement, counted, measure, ppm, shown};
use crate::population::scatter::{Event, LEVELS};
use crate::quantity::{display_unit, number};
use crate::report::page::page;
use crate::report::plot;

/// The population as one HTML file that needs no network and no script.
pub fn html(told: &Told<'_>) -> String {
    let joint = told.joint;
    let title = if joint.title.is_empty() { "Joint" } else { &joint.title };
    let settings = &told.scatter.settings;
    let callout = joint.fits.first().map_or("", |fit| fit.callout.as_str());
    let plots = plot::population(told.joint, told.scatter);
    let body = markup! {
        header.title-block {
            p.kind { "Population of a press or shrink fit" }
            h1 { (title) }
            p { (callout) ": integrated, and counted in " (settings.samples) " random pairs (seed " (settings.seed) "). Input SHA-256 " span.digest { (joint.digest) } }
            @for (key, value) in &joint.set { p.small { "set " (key) " = " (value) } }
        }
        main {
            section { h2 { "How often" } (events(told)) p { (agreement(told.scatter)) } }
            section {
                h2 { "Pictures" }
                @for plot in plots {
                    figure { h3 { (plot.title) } (plot.svg) figcaption { (plot.caption) } }
                }
            }
            section { h2 { "How much" } (quantities(told)) }
            section { h2 { "Which tolerance matters most" } (shares(told)) }
            section {
                h2 { "Assumed" }
                ul { @for sentence in told.assumed { li { (sentence) } } }
                @if told.assumed.is_empty() { p { "Nothing: the joint file says it all." } }
            }
        }
    };
    page(&format!("{title}: population"), &body)
}

fn events(told: &Told<'_>) -> Markup {
    let row = |event: &Event| {
        markup! {
            tr { th scope="row" { (event.what) ", " (event.at) } td { (ppm(event.probability)) } td { (counted(event.counted)) } }
            tr { td.quiet { "safety below " (number(event.required, 4)) } td { (ppm(event.below_required)) } td { (counted(event.counted_below_required)) } }
        }
    };
    markup! {
        div.scroll {
            table {
                thead { tr { th scope="col" { "What happens" } th scope="col" { "Integrated" } th scope="col" { "Counted" } } }
                tbody { @for event in told.scatter.slips.iter().chain(&told.scatter.failures) { (row(event)) } }
            }
        }
    }
}

fn quantities(told: &Told<'_>) -> Markup {
    let system = told.joint.display;
    markup! {
        div.scroll {
            table {
                thead {
                    tr {
                        th scope="col" { "Quantity" } th.r scope="col" { "least" }
                        @for level in LEVELS { th.r scope="col" { (number(level * 100.0, 5)) " %" } }
                        th.r scope="col" { "greatest" }
                    }
                }
                tbody {
                    @for spread in &told.scatter.quantities {
                        @let limits = told.scatter.model.limits(spread.quantity);
                        tr {
                            th scope="row" { (spread.quantity.name()) ", " (display_unit(measure(spread.quantity), system).name) }
                            td.r { (shown(limits.0, spread.quantity, system)) }
                            @for percentile in &spread.percentiles { td.r { (shown(percentile.1, spread.quantity, system)) } }
                            td.r { (shown(limits.1, spread.quantity, system)) }
                        }
                        tr {
                            td.quiet { "counted" } td {}
                            @for percentile in &spread.percentiles { td.r { (shown(percentile.2, spread.quantity, system)) } }
                            td {}
                        }
                    }
                }
            }
        }
        p.small { "Least and greatest are the arithmetic limits: the loosest and the tightest pair with the ends of the friction range." }
    }
}

fn shares(told: &Told<'_>) -> Markup {
    let percent = |share: f64| format!("{:.1} %", 100.0 * share);
    let rest = 1.0 - told.scatter.shares.iter().map(|share| share.torque).sum::<f64>();
    markup! {
        table {
            thead { tr { th scope="col" { "Share of the variance" } th.r scope="col" { "of the interference that grips" } th.r scope="col" { "of the torque capacity" } } }
            tbody {
                @for share in &told.scatter.shares {
                    tr { th scope="row" { (share.of) } td.r { (share.interference.map_or("–".to_owned(), percent)) } td.r { (percent(share.torque)) } }
                }
                tr { th scope="row" { "jointly" } td.r { "–" } td.r { (percent(rest.max(0.0))) } }
            }
        }
        p.small { "First-order shares; that a grip ends at zero is left aside. Source: I. M. Sobol', Mathematical Modelling and Computational Experiment 1 (1993) 407–414." }
    }
}
