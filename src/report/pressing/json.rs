//! Records as JSON: fixed names, full precision, units in the names.

use serde_json::{Value, json};

use super::{Entry, Seen, Told, cautions, count, unit_of};
use crate::pressing::checks::{Check, CheckUnit};
use crate::pressing::inference::{Bounded, Inferred};

/// The records as JSON.
///
/// | name | what it is |
/// |---|---|
/// | `pressing` | version of this format: 1 |
/// | `window` | `lower` and `upper`, each a list of `[travel_mm, force_n]` from first touch |
/// | `settings` | what is allowed besides |
/// | `records` | each with `file`, `ok`, `error`, and if it was read `rows`, `checks`, `tells`, `inferred` |
/// | `summary` | `judged`, `within`, `out`, `unread` |
///
/// A check has `check`, `found`, `low`, `high`, `unit` (`mm`, `N`, `N/mm`, `1`), `ok`, `at_mm`. What does not exist is null.
pub fn json(told: &Told<'_>) -> String {
    let joint = &told.findings.joint;
    let window = told.window;
    let course = |course: &[(f64, f64)]| -> Vec<Value> {
        course.iter().map(|(travel, force)| json!([travel * 1e3, force])).collect()
    };
    let summary = count(told.entries);
    let settings = told.settings;
    let value = json!({
        "pressing": 1,
        "version": env!("CARGO_PKG_VERSION"),
        "title": joint.title,
        "input_sha256": joint.digest,
        "set": joint.set,
        "window": {
            "lower": course(&window.lower),
            "upper": course(&window.upper),
            "engaged_length_mm": window.length * 1e3,
            "judged_to_mm": window.judged_to() * 1e3,
            "friction_low": window.friction.low,
            "friction_high": window.friction.high,
            "measured": window.measured,
        },
        "settings": {
            "touch_at_mm": settings.touch_at * 1e3,
            "touch_within_mm": settings.touch_within * 1e3,
            "force_uncertainty": settings.force_uncertainty,
            "drop": settings.drop,
            "ripple": settings.ripple,
            "steepening": settings.steepening,
        },
        "records": told.entries.iter().map(record).collect::<Vec<_>>(),
        "summary": {
            "judged": summary.within + summary.out,
            "within": summary.within,
            "out": summary.out,
            "unread": summary.unread,
        },
        "cautions": cautions(told.findings).map(|caution| &caution.text).collect::<Vec<_>>(),
    });
    let mut text = serde_json::to_string_pretty(&value).unwrap_or_default();
    text.push('\n');
    text
}

fn record(entry: &Entry) -> Value {
    match &entry.outcome {
        Ok(seen) => seen_json(&entry.file, seen),
        Err(fault) => json!({
            "file": entry.file,
            "ok": false,
            "error": {
                "message": fault.message,
                "line": fault.place.map(|place| place.line),
                "column": fault.place.map(|place| place.column),
                "help": fault.help,
            },
        }),
    }
}

fn seen_json(file: &str, seen: &Seen) -> Value {
    let judged = &seen.judged;
    json!({
        "file": file,
        "ok": judged.ok(),
        "error": null,
        "rows": seen.rows,
        "travel_column": seen.columns.travel.name,
        "force_column": seen.columns.force.name,
        "separator": char::from(seen.columns.separator).to_string(),
        "touch_mm": judged.touch.map(|touch| touch * 1e3),
        "reach_mm": judged.reach * 1e3,
        "greatest_reading_n": seen.greatest,
        "checks": judged.checks.iter().map(check).collect::<Vec<_>>(),
        "tells": judged.tells,
        "inferred": judged.inferred.as_ref().map(inferred),
    })
}

fn check(check: &Check) -> Value {
    let scale = match check.kind.unit() {
        CheckUnit::Travel => 1e3,
        CheckUnit::Slope => 1e-3,
        CheckUnit::Force | CheckUnit::Ratio => 1.0,
    };
    json!({
        "check": check.kind.key(),
        "found": check.found.map(|found| found * scale),
        "low": check.allowed.low.map(|low| low * scale),
        "high": check.allowed.high * scale,
        "unit": unit_of(check.kind.unit()),
        "ok": check.ok(),
        "at_mm": check.at.map(|at| at * 1e3),
    })
}

fn inferred(inferred: &Inferred) -> Value {
    let of = |value: Bounded, scale: f64| {
        let finite = |value: f64| value.is_finite().then_some(value * scale);
        json!({"best": finite(value.best), "low": finite(value.low), "high": finite(value.high)})
    };
    json!({
        "friction_times_pressure_mpa": of(inferred.product, 1e-6),
        "friction": of(inferred.friction, 1.0),
        "pressure_mpa": of(inferred.pressure, 1e-6),
        "effective_interference_um": of(inferred.interference, 1e6),
        "from_measured_sizes": inferred.measured,
    })
}
