//! The choice of a fit as one self-contained page: what is allowed, the fits, the picture.

use maud::{Markup, html};

use super::words;
use crate::population::choose::{Choice, ChosenFit};
use crate::quantity::{Measure, show};
use crate::report::page::page;
use crate::report::plot;

/// The choice as one HTML file that needs no network and no script; `all` lists every fit.
pub fn html(choice: &Choice, all: bool) -> String {
    let joint = &choice.joint;
    let title = if joint.title.is_empty() { "Choice of a fit" } else { joint.title.as_str() };
    let (fits, left_out) = words::shown(choice, all);
    let pictured: Vec<&ChosenFit> = if fits.is_empty() {
        choice.nearest.iter().chain(&choice.given).collect()
    } else {
        fits.iter().copied().take(words::MOST_SHOWN).collect()
    };
    let body = html! {
        header.title-block {
            p.kind { "Choice of a fit" }
            h1 { (title) }
            p { (subtitle(choice)) }
        }
        main {
            section { h2 { "What is allowed" } (allowed(choice)) }
            section { h2 { (words::heading(choice)) } (list(choice, &fits, left_out)) }
            @if let Some(picture) = plot::interference_windows(choice, &pictured) {
                section {
                    h2 { "Picture" }
                    figure { h3 { (picture.title) } (picture.svg) figcaption { (picture.caption) } }
                }
            }
            section { h2 { "Notes" } (notes(choice)) }
        }
        footer {
            p { "hubgrip " (env!("CARGO_PKG_VERSION")) " · input SHA-256 " span.digest { (joint.digest) } }
        }
    };
    page(&format!("{title}: choice of a fit"), &body)
}

fn subtitle(choice: &Choice) -> String {
    let joint = &choice.joint;
    let size = |value: f64| show(Measure::Size, value, joint.display).to_string();
    let materials: Vec<&str> = joint.rings.iter().map(|ring| ring.material.id.as_str()).collect();
    let drawing = joint.drawing.as_ref().map_or_else(String::new, |drawing| format!("{drawing} · "));
    format!("{drawing}{} by {} · {}", size(joint.diameter), size(joint.length), materials.join(" in "))
}

fn allowed(choice: &Choice) -> Markup {
    let unit = words::unit(choice.joint.display);
    html! {
        p.verdict { "Allowed interference: " strong { (words::window(choice)) } }
        div.scroll {
            table {
                thead { tr { th scope="col" { "interference, " (unit) } th scope="col" { "pair" } th scope="col" { "for" } } }
                tbody {
                    @for requirement in &choice.requirements {
                        tr {
                            td { (words::edge(choice, requirement)) }
                            td { (words::pair(requirement)) }
                            td { (words::requirement(choice, requirement)) }
                        }
                    }
                }
            }
        }
    }
}

fn list(choice: &Choice, fits: &[&ChosenFit], left_out: usize) -> Markup {
    html! {
        @if choice.fits.is_empty() {
            @for said in words::blocking(choice) { p { (said) } }
            @if let Some(nearest) = &choice.nearest {
                p { "Nearest is " strong { (nearest.callout) } ": " (words::missed(choice, nearest).join("; ")) "." }
            }
            h3 { "Smallest change that lets a fit in, each for itself" }
            @if let Some(note) = words::changes_note(choice) { p { (note) } }
            ul {
                @for change in &choice.changes {
                    li { (words::sentence(&words::parameter(choice, change.parameter))) ": " (words::change(choice, change)) }
                }
            }
        } @else {
            p { (words::sentence(&words::counts(choice))) ", the lowest relative cost first." }
            (table(choice, fits))
            @if left_out > 0 { p.small { (left_out) " more are not listed here." } }
        }
        @if let Some(given) = &choice.given {
            @let missed = words::missed(choice, given);
            @if missed.is_empty() { p { (given.callout) " of the joint file meets every requirement." } }
            @else { p { (given.callout) " of the joint file does not do: " (missed.join("; ")) "." } }
        }
    }
}

fn table(choice: &Choice, fits: &[&ChosenFit]) -> Markup {
    let unit = words::unit(choice.joint.display);
    let joining = words::joining_heading(choice);
    html! {
        div.scroll tabindex="0" role="region" aria-label="Fits" {
            table.duty {
                thead {
                    tr {
                        th scope="col" { "fit" }
                        th scope="col" { "basis" }
                        th.n scope="col" { "relative cost" }
                        th.n scope="col" { "interference, " (unit) }
                        th.n scope="col" { "spare below" }
                        th.n scope="col" { "spare above" }
                        th.n scope="col" { (words::hold_heading(choice)) }
                        th.n scope="col" { "shaft" }
                        th.n scope="col" { "hub" }
                        @if let Some(joining) = &joining { th.n scope="col" { (joining) } }
                        @for heading in words::last_headings(choice) { th.n scope="col" { (heading) } }
                    }
                }
                tbody {
                    @for fit in fits {
                        @let row = words::row(choice, fit);
                        tr {
                            th scope="row" {
                                @if fit.preferred_by.is_empty() { (fit.callout) } @else { strong { (fit.callout) " *" } }
                            }
                            td { (words::basis(choice, fit).trim_end_matches(" basis")) }
                            td.r { (row.cost) }
                            td.r { (row.loosest) " to " (row.tightest) }
                            td.r { (row.below) }
                            td.r { (row.above) }
                            td.r { (row.hold) }
                            td.r { (row.shaft) }
                            td.r { (row.hub) }
                            @if let Some(joining) = &row.joining { td.r { (joining) } }
                            @for cell in row.last_cells() { td.r { (cell) } }
                        }
                    }
                }
            }
        }
        p.small { (words::list_note(choice)) }
    }
}

fn notes(choice: &Choice) -> Markup {
    let joint = &choice.joint;
    html! {
        p { (words::cost_note(choice)) }
        @if let Some(note) = words::grade_note(choice) { p { (note) } }
        @for remark in choice.fits.first().map(ChosenFit::remarks).unwrap_or_default() { p { (remark) } }
        @for remark in &joint.remarks { p { (remark) } }
        @for (key, value) in &joint.set { p { "Set on the command line: " code { (key) "=" (value) } } }
        @if !joint.defaults.is_empty() {
            h3 { "Defaults taken" }
            ul.small {
                @for default in &joint.defaults { li { code { (default.key) } ": " (default.value) " (" (default.source) ")" } }
            }
        }
    }
}
