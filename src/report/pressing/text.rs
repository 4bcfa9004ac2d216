//! Records as text for an 80-column terminal.

use super::{
    Entry, Told, allowed, cautions, count, friction_or_product, friction_range, in_unit, inferred_sentences,
    place, read_as, short, unit_name, unmet, value,
};
use crate::assembly::cautions::Caution;
use crate::pressing::checks::{CheckKind, CheckUnit};
use crate::quantity::{Measure, UnitSystem, display_unit, number, show};
use crate::report::terminal::{BAD, GOOD, HEADING, heading, line, paragraph, plain};

/// The records as text for a terminal: each check of a single record, a row each of many.
pub fn text(told: &Told<'_>) -> String {
    let mut out = String::new();
    title(&mut out, told);
    match told.entries {
        [entry] => single(&mut out, told, entry),
        entries => many(&mut out, told, entries),
    }
    let cautions: Vec<&Caution> = cautions(told.findings).collect();
    if !cautions.is_empty() {
        heading(&mut out, "CAUTIONS");
        for caution in cautions {
            paragraph(&mut out, "- ", &plain(&format!("{} [{}]", caution.text, caution.source)));
        }
    }
    out
}

fn title(out: &mut String, told: &Told<'_>) {
    let joint = &told.findings.joint;
    let name = if joint.title.is_empty() { "Joint" } else { &joint.title };
    line(out, format!("{HEADING}{}{HEADING:#}", plain(name)));
    let callout = joint.fits.first().map_or("", |fit| fit.callout.as_str());
    let peak = |at: f64| show(Measure::Force, at, joint.display).to_string();
    paragraph(
        out,
        "",
        &format!(
            "{}  {callout}: the force must end between {} and {} (friction {})",
            show(Measure::Size, joint.diameter, joint.display),
            peak(told.window.lower.iter().map(|point| point.1).fold(0.0, f64::max)),
            peak(told.window.top()),
            friction_range(told.window),
        ),
    );
    for (key, value) in &joint.set {
        paragraph(out, "set ", &plain(&format!("{key} = {value}")));
    }
}

fn single(out: &mut String, told: &Told<'_>, entry: &Entry) {
    let seen = match &entry.outcome {
        Ok(seen) => seen,
        Err(fault) => return paragraph(out, "", &plain(&fault.to_string())),
    };
    let system = told.findings.joint.display;
    let judged = &seen.judged;
    line(out, "");
    line(out, format!("{}  {}", verdict(judged.ok()), plain(&entry.file)));
    line(out, "");
    line(out, format!("{:<22}{:>13}{:>26}  {}", "", "found", "allowed", "verdict"));
    for check in &judged.checks {
        let met = if check.ok() { format!("{GOOD}met{GOOD:#}") } else { format!("{BAD}NOT MET{BAD:#}") };
        line(
            out,
            format!(
                "{:<22}{:>13}{:>26}  {met}{}",
                check.kind.name(),
                check.found.map_or("–".to_owned(), |found| value(found, check.kind.unit(), system)),
                allowed(check, system),
                place(check, system),
            ),
        );
    }
    line(out, "");
    for sentence in &judged.tells {
        paragraph(out, "- ", sentence);
    }
    for sentence in inferred_sentences(judged.inferred.as_ref(), told.window, system) {
        paragraph(out, "- ", &sentence);
    }
    paragraph(out, "- ", &plain(&read_as(seen, system)));
}

fn verdict(ok: bool) -> String {
    if ok { format!("{GOOD}WITHIN{GOOD:#}") } else { format!("{BAD}OUT{BAD:#}") }
}

fn many(out: &mut String, told: &Told<'_>, entries: &[Entry]) {
    let system = told.findings.joint.display;
    let count = count(entries);
    line(out, "");
    line(
        out,
        format!(
            "{} records: {GOOD}{} within{GOOD:#}, {BAD}{} out{BAD:#}, {} not readable",
            entries.len(),
            count.within,
            count.out,
            count.unread
        ),
    );
    line(out, "");
    let unit = |unit| unit_name(unit, system);
    line(
        out,
        format!(
            "{:<26}{:>9}{:>9}{:>9}{:>9}{:>9}  {}",
            "record",
            "start",
            "slope",
            "peak",
            "end",
            if told.window.measured { "friction" } else { "μ·p" },
            "verdict"
        ),
    );
    let of_product = if told.window.measured { "" } else { display_unit(Measure::Pressure, system).name };
    line(
        out,
        format!(
            "{:<26}{:>9}{:>9}{:>9}{:>9}{:>9}",
            "",
            unit(CheckUnit::Travel),
            unit(CheckUnit::Slope),
            unit(CheckUnit::Force),
            unit(CheckUnit::Force),
            of_product
        ),
    );
    for entry in entries {
        line(out, row(entry, system));
    }
    for entry in entries {
        reasons(out, entry);
    }
}

fn row(entry: &Entry, system: UnitSystem) -> String {
    let name = tail(&plain(short(&entry.file)), 25);
    let Ok(seen) = &entry.outcome else {
        return format!("{name:<26}{:>45}  {BAD}NOT READ{BAD:#}", "");
    };
    let judged = &seen.judged;
    let cell = |kind: CheckKind| {
        let found = judged.check(kind).and_then(|check| check.found);
        found.map_or("–".to_owned(), |found| number(in_unit(found, kind.unit(), system), 3))
    };
    format!(
        "{name:<26}{:>9}{:>9}{:>9}{:>9}{:>9}  {}",
        cell(CheckKind::Start),
        cell(CheckKind::Slope),
        cell(CheckKind::Peak),
        cell(CheckKind::End),
        friction_or_product(judged, system),
        verdict(judged.ok())
    )
}

/// The end of a name that is too long.
fn tail(name: &str, most: usize) -> String {
    let letters: Vec<char> = name.chars().collect();
    if letters.len() <= most {
        return name.to_owned();
    }
    std::iter::once('…').chain(letters[letters.len() + 1 - most..].iter().copied()).collect()
}

fn reasons(out: &mut String, entry: &Entry) {
    match &entry.outcome {
        Ok(seen) if !seen.judged.ok() => {
            line(out, "");
            paragraph(out, "", &format!("{}: not met: {}", plain(&entry.file), unmet(&seen.judged)));
            for sentence in &seen.judged.tells {
                paragraph(out, "- ", sentence);
            }
        }
        Err(fault) => {
            line(out, "");
            paragraph(out, "", &plain(&fault.to_string()));
        }
        Ok(_) => {}
    }
}
