//! The choice of a fit as text for an 80-column terminal; as JSON and as a page in its modules.

mod json;
mod page;
pub(in crate::report) mod words;

use std::fmt::Write;

use comfy_table::ContentArrangement;

use crate::population::choose::{Choice, ChosenFit};
use crate::quantity::{Measure, show};

use super::terminal::{BAD, GOOD, WIDTH, heading, line, paragraph, plain, print_table, table};

pub use json::to_json;
pub use page::html;

/// The choice as text; `all` lists every fit.
pub fn text(choice: &Choice, all: bool) -> String {
    let mut out = String::new();
    title(&mut out, choice);
    requirements(&mut out, choice);
    if choice.fits.is_empty() {
        nothing(&mut out, choice);
    } else {
        fits(&mut out, choice, all);
    }
    given(&mut out, choice);
    notes(&mut out, choice);
    out
}

fn title(out: &mut String, choice: &Choice) {
    let joint = &choice.joint;
    let mut name = if joint.title.is_empty() { "Joint".to_owned() } else { plain(&joint.title) };
    if let Some(drawing) = &joint.drawing {
        let _ = write!(name, " · {}", plain(drawing));
    }
    heading_at_top(out, &name);
    let size = |value: f64| show(Measure::Size, value, joint.display).to_string();
    if let [shaft, hub] = joint.rings.as_slice() {
        paragraph(
            out,
            "",
            &format!(
                "{} by {}: {} of {} in {} of {}, outer diameter {}",
                size(joint.diameter),
                size(joint.length),
                shaft.name,
                shaft.material.id,
                hub.name,
                hub.material.id,
                size(hub.outer_diameter)
            ),
        );
    }
    for (key, value) in &joint.set {
        paragraph(out, "set ", &plain(&format!("{key} = {value}")));
    }
}

fn heading_at_top(out: &mut String, text: &str) {
    let mut with_line = String::new();
    heading(&mut with_line, text);
    out.push_str(with_line.trim_start_matches('\n'));
}

fn requirements(out: &mut String, choice: &Choice) {
    let unit = words::unit(choice.joint.display);
    heading(out, &format!("Allowed interference: {}", words::window(choice)));
    let mut rows = table(&[format!("{unit}, pair"), "requirement".to_owned()]);
    rows.set_content_arrangement(ContentArrangement::Dynamic).set_width(WIDTH as u16);
    for requirement in &choice.requirements {
        rows.add_row(vec![
            format!("{}, {}", words::edge(choice, requirement), words::pair(requirement)),
            words::requirement(choice, requirement),
        ]);
    }
    print_table(out, rows, 9);
}

fn fits(out: &mut String, choice: &Choice, all: bool) {
    let (shown, left_out) = words::shown(choice, all);
    heading(out, &words::heading(choice));
    paragraph(
        out,
        "",
        &words::sentence(&format!("{}; the lowest relative cost first.", words::counts(choice))),
    );
    fit_table(out, choice, &shown);
    if left_out > 0 {
        paragraph(out, "", &format!("{left_out} more are listed with --all and with --json."));
    }
    line(out, "");
    paragraph(out, "", &words::list_note(choice));
    paragraph(out, "", &words::cost_note(choice));
}

fn fit_table(out: &mut String, choice: &Choice, fits: &[&ChosenFit]) {
    let to = format!("to {}", words::unit(choice.joint.display));
    let last = words::last_headings(choice);
    // With a time and a bearing there is no room for what is to spare, which the page and the JSON have as well.
    let spare = last.len() < 3;
    let mut header = ["fit", "cost", "from", &to].map(str::to_owned).to_vec();
    header.extend(["below", "above"].map(str::to_owned).into_iter().filter(|_| spare));
    header.extend([words::hold_heading(choice), "shaft", "hub"].map(str::to_owned));
    header.extend(words::joining_heading(choice));
    header.extend(last);
    let mut rows = table(&header);
    for fit in fits {
        let mark = if fit.preferred_by.is_empty() { "" } else { " *" };
        let row = words::row(choice, fit);
        let last: Vec<String> = row.last_cells().map(str::to_owned).collect();
        let mut cells = vec![format!("{}{mark}", fit.callout), row.cost, row.loosest, row.tightest];
        cells.extend([row.below, row.above].into_iter().filter(|_| spare));
        cells.extend([row.hold, row.shaft, row.hub]);
        cells.extend(row.joining);
        cells.extend(last);
        rows.add_row(cells);
    }
    print_table(out, rows, 1);
}

fn nothing(out: &mut String, choice: &Choice) {
    line(out, "");
    line(out, format!("{BAD}{}.{BAD:#}", words::heading(choice)));
    for said in words::blocking(choice) {
        paragraph(out, "", &said);
    }
    if let Some(nearest) = &choice.nearest {
        let system = choice.joint.display;
        let deviation = |value: f64| show(Measure::Deviation, value, system).number;
        let missed = words::missed(choice, nearest).join("; ");
        paragraph(
            out,
            "",
            &format!(
                "Nearest is {} with {} to {} {}: {missed}.",
                nearest.callout,
                deviation(nearest.loosest),
                deviation(nearest.tightest),
                words::unit(system)
            ),
        );
    }
    heading(out, "Smallest change that lets a fit in, each for itself");
    if let Some(note) = words::changes_note(choice) {
        paragraph(out, "  ", note);
    }
    for change in &choice.changes {
        let key = change.parameter.key().map_or_else(String::new, |key| format!(" ({key})"));
        let name = words::parameter(choice, change.parameter);
        paragraph(out, "  ", &format!("{name}{key}: {}", words::change(choice, change)));
    }
}

fn given(out: &mut String, choice: &Choice) {
    let Some(fit) = &choice.given else { return };
    line(out, "");
    let missed = words::missed(choice, fit);
    if missed.is_empty() {
        line(
            out,
            format!("{GOOD}{} of the joint file meets every requirement.{GOOD:#}", plain(&fit.callout)),
        );
    } else {
        let said = format!("{} of the joint file does not do: {}.", plain(&fit.callout), missed.join("; "));
        paragraph(out, "", &said);
    }
}

fn notes(out: &mut String, choice: &Choice) {
    let joint = &choice.joint;
    let mut said: Vec<String> = words::grade_note(choice).into_iter().collect();
    said.extend(choice.fits.first().map(ChosenFit::remarks).unwrap_or_default());
    said.extend(joint.remarks.iter().cloned());
    if !said.is_empty() {
        heading(out, "Notes");
        for note in &said {
            paragraph(out, "  ", &plain(note));
        }
    }
    if !joint.defaults.is_empty() {
        heading(out, "Defaults taken");
        for default in &joint.defaults {
            paragraph(out, "  ", &format!("{}: {} ({})", default.key, default.value, default.source));
        }
    }
}
