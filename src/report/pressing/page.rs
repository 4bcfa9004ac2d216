//! Records as one self-contained page with their curves.

use maud::{Markup, html as markup};

use super::{
    Count, Entry, Seen, Told, allowed, cautions, count, friction_or_product, in_unit, inferred_sentences,
    place, read_as, short, unit_name, unmet, value,
};
use crate::pressing::checks::{CheckKind, CheckUnit};
use crate::quantity::{Measure, display_unit, number};
use crate::report::page::page;
use crate::report::plot::{self, Plot};
use crate::report::typeset::{self, prose};

/// Most records that are out and shown with a picture of their own; the others stand in the table and the JSON.
const MOST_PICTURES: usize = 24;

/// The records as one HTML file that needs no network and no script.
pub fn html(told: &Told<'_>) -> String {
    let joint = &told.findings.joint;
    let title = if joint.title.is_empty() { "Joint" } else { &joint.title };
    let callout = joint.fits.first().map_or("", |fit| fit.callout.as_str());
    let body = markup! {
        header.title-block {
            p.kind { "Press-in records of a press fit" }
            h1 { (title) }
            p.small { (callout) " · hubgrip " (env!("CARGO_PKG_VERSION")) " · input SHA-256 " span.digest { (joint.digest) } }
            @for (key, value) in &joint.set { p.small { "set " (key) " = " (value) } }
        }
        main {
            p.verdict { (verdict_sentence(told)) }
            (pictures(told))
            @if told.entries.len() > 1 { (all_records(told)) }
            (each(told))
            (how(told))
        }
    };
    page(&format!("{title}: press-in records"), &body)
}

fn verdict_sentence(told: &Told<'_>) -> String {
    let Count { within, out, unread } = count(told.entries);
    match told.entries {
        [entry] => match &entry.outcome {
            Ok(seen) if seen.judged.ok() => format!("{}: every check is met.", entry.file),
            Ok(seen) => format!("{}: NOT MET: {}.", entry.file, unmet(&seen.judged)),
            Err(fault) => format!("Not readable: {fault}."),
        },
        entries => format!(
            "{within} of {} records are within the joint's window, {out} {} out, {unread} could not be read.",
            entries.len(),
            if out == 1 { "is" } else { "are" },
        ),
    }
}

fn figure(plot: &Plot) -> Markup {
    markup! { figure { h3 { (plot.title) } (plot.svg) figcaption { (plot.caption) } } }
}

fn pictures(told: &Told<'_>) -> Markup {
    let seen: Vec<(&str, &crate::pressing::Judged)> = told
        .entries
        .iter()
        .filter_map(|entry| Some((entry.file.as_str(), &entry.outcome.as_ref().ok()?.judged)))
        .collect();
    let system = told.findings.joint.display;
    markup! {
        @if !seen.is_empty() {
            section {
                h2 { "Force along the travel" }
                (figure(&plot::press_records("plot-records", told.window, &seen, system)))
            }
        }
    }
}

fn all_records(told: &Told<'_>) -> Markup {
    let system = told.findings.joint.display;
    let unit = |unit| unit_name(unit, system);
    let cell = |seen: &Seen, kind: CheckKind| {
        let check = seen.judged.check(kind);
        let found = check.and_then(|check| check.found);
        let text = found.map_or("–".to_owned(), |found| {
            typeset::number(&number(in_unit(found, kind.unit(), system), 3))
        });
        let missed = check.is_some_and(|check| !check.ok());
        markup! { td.r { span.missed[missed] { (text) } } }
    };
    let shown = [
        CheckKind::Start,
        CheckKind::Slope,
        CheckKind::Peak,
        CheckKind::End,
        CheckKind::Drop,
        CheckKind::Ripple,
    ];
    let row = |entry: &Entry| {
        markup! {
            tr {
                th scope="row" { (short(&entry.file)) }
                @match &entry.outcome {
                    Ok(seen) => {
                        @for kind in shown { (cell(seen, kind)) }
                        td.r { (friction_or_product(&seen.judged, system)) }
                        td { span.missed[!seen.judged.ok()] { (if seen.judged.ok() { "within" } else { "OUT" }) } }
                    }
                    Err(fault) => {
                        td colspan=(shown.len() + 1) { (fault.message) @if let Some(place) = fault.place { ", line " (place.line) } }
                        td { span.missed { "NOT READ" } }
                    }
                }
            }
        }
    };
    markup! {
        section {
            h2 { "All records" }
            div.scroll tabindex="0" role="region" aria-label="All records" {
                table {
                    thead {
                        tr {
                            th scope="col" { "Record" }
                            @for kind in shown { th.r scope="col" { (kind.key()) span.unit { (unit(kind.unit())) } } }
                            th.r scope="col" { @if told.window.measured { "friction" } @else { "friction × pressure" span.unit { (display_unit(Measure::Pressure, system).name) } } }
                            th scope="col" { "Verdict" }
                        }
                    }
                    tbody { @for entry in told.entries { (row(entry)) } }
                }
            }
            p.small { "A number that is not met is bold. Limits of what is inferred stand in the JSON." }
        }
    }
}

/// A section for the only record, or for each record that is out or not readable.
fn each(told: &Told<'_>) -> Markup {
    let only = told.entries.len() == 1;
    let picked =
        told.entries.iter().filter(|entry| only || !matches!(&entry.outcome, Ok(seen) if seen.judged.ok()));
    let mut pictures = 0;
    let sections: Vec<Markup> = picked
        .map(|entry| match &entry.outcome {
            Ok(seen) => {
                pictures += 1;
                record(told, entry, seen, !only && pictures <= MOST_PICTURES, pictures)
            }
            Err(fault) => markup! {
                section {
                    h2 { (entry.file) ": not readable" }
                    p { (fault.to_string()) }
                    @if let Some(help) = &fault.help { p.quiet { "Help: " (help) } }
                }
            },
        })
        .collect();
    markup! { @for section in sections { (section) } }
}

fn record(told: &Told<'_>, entry: &Entry, seen: &Seen, picture: bool, number: usize) -> Markup {
    let system = told.findings.joint.display;
    let judged = &seen.judged;
    let heading = if told.entries.len() == 1 { "Checks".to_owned() } else { format!("{}: out", entry.file) };
    markup! {
        section {
            h2 { (heading) }
            @for sentence in &judged.tells { p { (sentence) } }
            @if picture {
                (figure(&plot::press_records(&format!("plot-record-{number}"), told.window, &[(&entry.file, judged)], system)))
            }
            div.scroll tabindex="0" role="region" aria-label="Checks" {
                table {
                    thead { tr { th scope="col" { "Check" } th.r scope="col" { "found" } th.r scope="col" { "allowed" } th scope="col" { "verdict" } } }
                    tbody {
                        @for check in &judged.checks {
                            tr {
                                th scope="row" { (check.kind.name()) }
                                td.r { (check.found.map_or("–".to_owned(), |found| prose(&value(found, check.kind.unit(), system)))) }
                                td.r { (prose(&allowed(check, system))) }
                                td { @if check.ok() { "met" } @else { span.missed { "NOT MET" } (place(check, system)) } }
                            }
                        }
                    }
                }
            }
            @for sentence in inferred_sentences(judged.inferred.as_ref(), told.window, system) { p { (sentence) } }
            p.small { (read_as(seen, system)) }
        }
    }
}

fn how(told: &Told<'_>) -> Markup {
    let system = told.findings.joint.display;
    let settings = told.settings;
    let travel = |si: f64| value(si, CheckUnit::Travel, system);
    let percent = |share: f64| format!("{} %", number(100.0 * share, 3));
    markup! {
        section {
            h2 { "How it is judged" }
            ul {
                li { "The window lies between the loosest pair at the low friction and the tightest pair at the high friction of the joint file (equilibrium of the chamfered shaft; plateau of DIN 7190-1)." }
                li { "The first touch is where the climb between 5 % and 30 % of the force, carried back, begins; it must lie at " (travel(settings.touch_at)) " ± " (travel(settings.touch_within)) " of the recorded travel (common practice, no source)." }
                li { "Judged up to " (value(told.window.judged_to(), CheckUnit::Travel, system)) " from first touch: 98 % of the engaged length, as behind it the part may meet its shoulder." }
                li { "Allowed outside the window: " (percent(settings.force_uncertainty)) " of its top, the uncertainty of a force channel of class 1 (ISO 7500-1, from memory)." }
                li { "A fall of the force by more than " (percent(settings.drop)) " of the peak, ripple of more than " (percent(settings.ripple)) " of it, or a slope that grows or shrinks more than " (number(settings.steepening, 3)) " times along the way is not met (common practice, no source)." }
                li { "Friction and pressure act as a product. Limits of what is inferred are worst cases: three standard errors of the slope, the uncertainty of the force, and the ends of sizes or of the friction range." }
                li { "A record within the window shows that this pressing went as the joint file expects. It does not measure the torque that the joint will hold." }
            }
            @for caution in cautions(told.findings) { p { strong { "Caution: " } (caution.text) " " span.source { "[" (caution.source) "]" } } }
        }
    }
}
