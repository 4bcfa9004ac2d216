//! Recorded press-in curves with their verdicts, as text, as JSON, and as a plotted page.

mod json;
mod page;
mod text;

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
pub use text::text;

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

/// The cautions of the joint that bear on its window.
fn cautions(findings: &Findings) -> impl Iterator<Item = &Caution> {
    findings.cautions.iter().filter(|caution| matches!(caution.subject, "strength" | "input"))
}

fn friction_range(window: &Window) -> String {
    format!("{} to {}", number(window.friction.low, 3), number(window.friction.high, 3))
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
