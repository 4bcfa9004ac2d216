//! Recorded press-in curves with their verdicts, as text, as JSON, and as a plotted page.

mod json;
mod page;

use super::terminal::{BAD, GOOD, HEADING, heading, line, paragraph, plain};
use crate::assembly::cautions::Caution;
use crate::diagnostic::Diagnostic;
use crate::findings::Findings;
use crate::pressing::checks::{Check, CheckKind, CheckUnit};
use crate::pressing::columns::Columns;
use crate::pressing::inference::Inferred;
use crate::pressing::{Bounded, Judged, Settings, Window};
use crate::quantity::{Measure, UnitSystem, display_unit, number, show};

pub use json::json;
pub use page::html;

/// Records judged against a joint.
#[derive(Debug, Clone, Copy)]
pub struct Told<'a> {
    /// The joint.
    pub findings: &'a Findings,
    /// What it allows.
    pub window: &'a Window,
    /// What is allowed besides.
    pub settings: &'a Settings,
    /// The records in the order given.
    pub entries: &'a [Entry],
}

/// One record.
#[derive(Debug, Clone, PartialEq)]
pub struct Entry {
    /// Its file as given.
    pub file: String,
    /// What was found, or why it could not be read.
    pub outcome: Result<Seen, Box<Diagnostic>>,
}

/// A record that was read and judged.
#[derive(Debug, Clone, PartialEq)]
pub struct Seen {
    /// The header as understood.
    pub columns: Columns,
    /// Number of rows.
    pub rows: u64,
    /// Greatest single reading, N.
    pub greatest: f64,
    /// The verdict.
    pub judged: Judged,
}

/// How many records are within, out, and not readable.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub struct Count {
    /// Every check met.
    pub within: usize,
    /// Some check not met.
    pub out: usize,
    /// Not readable.
    pub unread: usize,
}

/// Counts the records.
pub fn count(entries: &[Entry]) -> Count {
    let mut count = Count::default();
    for entry in entries {
        match &entry.outcome {
            Ok(seen) if seen.judged.ok() => count.within += 1,
            Ok(_) => count.out += 1,
            Err(_) => count.unread += 1,
        }
    }
    count
}

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

/// The cautions of the joint that bear on its window.
fn cautions(findings: &Findings) -> impl Iterator<Item = &Caution> {
    findings.cautions.iter().filter(|caution| matches!(caution.subject, "strength" | "input"))
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

fn friction_range(window: &Window) -> String {
    format!("{} to {}", number(window.friction.low, 3), number(window.friction.high, 3))
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

/// How the record was understood.
fn read_as(seen: &Seen, system: UnitSystem) -> String {
    let separator = match seen.columns.separator {
        b';' => "semicolons",
        b'\t' => "tabs",
        _ => "commas",
    };
    format!(
        "Read as {} rows of `{}` and `{}`, parted by {separator}; greatest single reading {}.",
        seen.rows,
        seen.columns.travel.name,
        seen.columns.force.name,
        show(Measure::Force, seen.greatest, system)
    )
}

fn verdict(ok: bool) -> String {
    if ok { format!("{GOOD}WITHIN{GOOD:#}") } else { format!("{BAD}OUT{BAD:#}") }
}

fn place(check: &Check, system: UnitSystem) -> String {
    match check.at {
        Some(at) if !check.ok() && check.kind != CheckKind::Start => {
            format!(", at {}", show_length(at, system))
        }
        _ => String::new(),
    }
}

/// A travel to a tenth of a per cent.
fn show_length(si: f64, system: UnitSystem) -> String {
    let unit = display_unit(Measure::Size, system);
    format!("{} {}", number(unit.of(si), 3), unit.name)
}

/// Number and unit of a check.
fn value(si: f64, unit: CheckUnit, system: UnitSystem) -> String {
    let name = unit_name(unit, system);
    let number = number(in_unit(si, unit, system), 4);
    if name.is_empty() { number } else { format!("{number} {name}") }
}

fn in_unit(si: f64, unit: CheckUnit, system: UnitSystem) -> f64 {
    let (force, size) = (display_unit(Measure::Force, system), display_unit(Measure::Size, system));
    match unit {
        CheckUnit::Travel => (size.of(si) * 1e3).round() / 1e3 + 0.0,
        CheckUnit::Force => force.of(si),
        CheckUnit::Slope => si * force.per_si / size.per_si,
        CheckUnit::Ratio => si,
    }
}

fn unit_name(unit: CheckUnit, system: UnitSystem) -> String {
    let (force, size) = (display_unit(Measure::Force, system).name, display_unit(Measure::Size, system).name);
    match unit {
        CheckUnit::Travel => size.to_owned(),
        CheckUnit::Force => force.to_owned(),
        CheckUnit::Slope => format!("{force}/{size}"),
        CheckUnit::Ratio => String::new(),
    }
}

fn allowed(check: &Check, system: UnitSystem) -> String {
    let unit = check.kind.unit();
    let high = value(check.allowed.high, unit, system);
    match check.allowed.low {
        Some(low) => format!("{} to {high}", number(in_unit(low, unit, system), 4)),
        None => format!("at most {high}"),
    }
}

/// `0.12 (0.10 to 0.14)` with a unit; without end where the limits have none.
fn bounded(value: Bounded, shown: impl Fn(f64) -> String) -> String {
    if value.best.is_finite() && value.high.is_finite() {
        format!("{} ({} to {})", shown(value.best), shown(value.low), shown(value.high))
    } else {
        format!("at least {}", shown(value.low))
    }
}

/// What is inferred, in sentences.
fn inferred_sentences(inferred: Option<&Inferred>, window: &Window, system: UnitSystem) -> Vec<String> {
    let Some(inferred) = inferred else {
        return vec![
            "Friction and interference are not inferred: the record does not show a steady climb over the engaged length."
                .to_owned(),
        ];
    };
    let pressure = |value: f64| show(Measure::Pressure, value, system).to_string();
    let deviation = |value: f64| show(Measure::Deviation, value, system).to_string();
    let mut all = vec![format!("Friction times contact pressure: {}.", bounded(inferred.product, pressure))];
    let friction = bounded(inferred.friction, |value| number(value, 3));
    if inferred.measured {
        all.push(format!(
            "Friction while pressing: {friction}, from the measured sizes with their uncertainty and the smoothing of the joint file."
        ));
    } else {
        all.push(format!(
            "Only that product is seen. Over the pairs of the tolerances the friction was {friction}; over the friction {} the \
             interference that grips was {}.",
            friction_range(window),
            bounded(inferred.interference, deviation)
        ));
    }
    all
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

/// The friction of measured parts, else friction times pressure.
fn friction_or_product(judged: &Judged, system: UnitSystem) -> String {
    let best = judged.inferred.map(|inferred| match inferred.measured {
        true => inferred.friction.best,
        false => display_unit(Measure::Pressure, system).of(inferred.product.best),
    });
    best.filter(|best| best.is_finite()).map_or("–".to_owned(), |best| number(best, 3))
}

/// A file without its folder.
fn short(name: &str) -> &str {
    name.rsplit(['/', '\\']).next().unwrap_or(name)
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

/// The names of the checks that are not met.
fn unmet(judged: &Judged) -> String {
    let names: Vec<&str> = judged
        .checks
        .iter()
        .filter(|check| !check.ok())
        .map(
            |check| {
                if check.kind == CheckKind::Course { "course within the window" } else { check.kind.name() }
            },
        )
        .collect();
    names.join(", ")
}

/// Unit of a check in JSON.
fn unit_of(unit: CheckUnit) -> &'static str {
    match unit {
        CheckUnit::Travel => "mm",
        CheckUnit::Force => "N",
        CheckUnit::Slope => "N/mm",
        CheckUnit::Ratio => "1",
    }
}
