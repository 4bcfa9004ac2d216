//! A population as text, as JSON, and as a plotted page.

mod page;

use std::fmt::Write;

use serde_json::{Value, json};

use super::terminal::{WIDTH, plain};
use crate::joint::Joint;
use crate::population::monte_carlo::estimate::{CONFIDENCE, Estimate};
use crate::population::scatter::{Event, LEVELS, Quantity, Scatter, Spread};
use crate::quantity::{Measure, UnitSystem, display_unit, number};

pub use page::html;

/// Below this the integration is not trusted: the tails of a normal are cut at 1e-19, sums keep about 1e-14.
const LEAST_PROBABILITY: f64 = 1e-12;

/// A population with the joint it belongs to and what was assumed.
#[derive(Debug, Clone, Copy)]
pub struct Told<'a> {
    /// The joint.
    pub joint: &'a Joint,
    /// The results.
    pub scatter: &'a Scatter,
    /// What was taken where the file is silent; full sentences.
    pub assumed: &'a [String],
}

/// Measure of a quantity.
fn measure(quantity: Quantity) -> Measure {
    match quantity {
        Quantity::Interference | Quantity::EffectiveInterference => Measure::Deviation,
        Quantity::Pressure | Quantity::HubStress => Measure::Pressure,
        Quantity::TorqueCapacity => Measure::Torque,
        Quantity::PressForce => Measure::Force,
    }
}

/// A probability in parts per million.
fn ppm(probability: f64) -> String {
    if probability < LEAST_PROBABILITY {
        return "less than 1e-6 ppm".to_owned();
    }
    format!("{} ppm", number(probability * 1e6, 4))
}

/// A counted probability with its standard error and interval, or why it is not quoted.
fn counted(estimate: Estimate) -> String {
    let (low, high) = estimate.interval();
    if !estimate.is_quotable() {
        return format!(
            "{} of {}, no share is quoted below 100/n; {} % sure: at most {}",
            estimate.count,
            estimate.samples,
            CONFIDENCE * 100.0,
            ppm(high)
        );
    }
    format!(
        "{} ± {} ppm (standard error); {} % sure: {} to {} ppm",
        number(estimate.share() * 1e6, 4),
        number(estimate.standard_error() * 1e6, 2),
        CONFIDENCE * 100.0,
        number(low * 1e6, 4),
        number(high * 1e6, 4)
    )
}

/// The population as text for a terminal.
pub fn text(told: &Told<'_>) -> String {
    let mut out = String::new();
    title(&mut out, told);
    heading(&mut out, "HOW OFTEN");
    for event in told.scatter.slips.iter().chain(&told.scatter.failures) {
        event_text(&mut out, event);
    }
    if told.scatter.slips.is_empty() {
        paragraph(&mut out, "", "no state has a torque or an axial force: nothing can slip");
    }
    paragraph(&mut out, "", &agreement(told.scatter));
    heading(&mut out, "HOW MUCH");
    quantities(&mut out, told);
    heading(&mut out, "WHICH TOLERANCE MATTERS MOST");
    shares(&mut out, told.scatter);
    if !told.assumed.is_empty() {
        heading(&mut out, "ASSUMED");
        for sentence in told.assumed {
            paragraph(&mut out, "- ", sentence);
        }
    }
    out
}

fn title(out: &mut String, told: &Told<'_>) {
    let joint = told.joint;
    let name = if joint.title.is_empty() { "Joint" } else { &joint.title };
    paragraph(out, "", &plain(name));
    let callout = joint.fits.first().map_or("", |fit| fit.callout.as_str());
    let size = crate::quantity::show(Measure::Size, joint.diameter, joint.display);
    let settings = &told.scatter.settings;
    paragraph(
        out,
        "",
        &format!(
            "{size}  {callout}: integrated, and counted in {} random pairs (seed {})",
            settings.samples, settings.seed
        ),
    );
    for (key, value) in &joint.set {
        paragraph(out, "set ", &plain(&format!("{key} = {value}")));
    }
}

fn event_text(out: &mut String, event: &Event) {
    paragraph(out, "", &format!("{}, {}: {}", event.what, plain(&event.at), ppm(event.probability)));
    paragraph(out, "    counted: ", &counted(event.counted));
    paragraph(
        out,
        "  ",
        &format!("safety below {}: {}", number(event.required, 4), ppm(event.below_required)),
    );
    paragraph(out, "    counted: ", &counted(event.counted_below_required));
}

fn agreement(scatter: &Scatter) -> String {
    let apart: Vec<&str> = scatter
        .slips
        .iter()
        .chain(&scatter.failures)
        .filter(|event| !event.agrees())
        .map(|event| event.what.as_str())
        .collect();
    if apart.is_empty() {
        "The two engines agree: every count lies within 4 standard errors (and the grain of 4 counts) of what is integrated."
            .to_owned()
    } else {
        format!("THE TWO ENGINES DO NOT AGREE on {}: trust neither.", apart.join(", "))
    }
}

/// A name that fits a column.
fn short_name(quantity: Quantity) -> &'static str {
    match quantity {
        Quantity::EffectiveInterference => "of it grips",
        Quantity::TorqueCapacity => "torque",
        other => other.name(),
    }
}

/// A number of a table: to the digits of its measure.
fn shown(value: f64, quantity: Quantity, system: UnitSystem) -> String {
    let value = display_unit(measure(quantity), system).of(value);
    match measure(quantity) {
        Measure::Deviation => format!("{value:.1}"),
        _ => number(value, 4),
    }
}

fn quantities(out: &mut String, told: &Told<'_>) {
    let system = told.joint.display;
    let picked = [0usize, 1, 3, 5, 6];
    let _ = write!(out, "{:<22}{:>8}", "", "least");
    for level in picked.iter().filter_map(|index| LEVELS.get(*index)) {
        let _ = write!(out, "{:>8}", format!("{}%", number(level * 100.0, 5)));
    }
    line(out, format!("{:>9}", "greatest"));
    for spread in &told.scatter.quantities {
        let cell = |value: f64| shown(value, spread.quantity, system);
        let (least, greatest) = told.scatter.model.limits(spread.quantity);
        let unit = display_unit(measure(spread.quantity), system).name;
        let _ = write!(out, "{:<22}{:>8}", format!("{}, {unit}", short_name(spread.quantity)), cell(least));
        let percentiles = || picked.iter().filter_map(|index| spread.percentiles.get(*index));
        percentiles().for_each(|percentile| {
            let _ = write!(out, "{:>8}", cell(percentile.1));
        });
        line(out, format!("{:>9}", cell(greatest)));
        let _ = write!(out, "{:<30}", "  counted");
        percentiles().for_each(|percentile| {
            let _ = write!(out, "{:>8}", cell(percentile.2));
        });
        line(out, "");
    }
    paragraph(
        out,
        "",
        "least and greatest are the arithmetic limits: the loosest and the tightest pair with the ends of the friction range; a share of the parts \
         may lie outside them when the distributions are not cut",
    );
    line(out, "");
    line(out, format!("{:<26}{:>14}{:>14}{:>13}{:>13}", "", "mean", "counted", "sd", "counted"));
    for spread in &told.scatter.quantities {
        let unit = display_unit(measure(spread.quantity), system);
        let value = |si: f64| number(si * unit.per_si, 5);
        line(
            out,
            format!(
                "{:<26}{:>14}{:>14}{:>13}{:>13}",
                format!("{}, {}", spread.quantity.name(), unit.name),
                value(spread.moments.0),
                value(spread.sampled_moments.0),
                value(spread.moments.1),
                value(spread.sampled_moments.1)
            ),
        );
    }
}

fn shares(out: &mut String, scatter: &Scatter) {
    line(
        out,
        format!(
            "{:<25}{:>27}{:>27}",
            "share of the variance of", "interference that grips", "torque capacity"
        ),
    );
    let percent = |share: f64| format!("{:.1} %", 100.0 * share);
    for share in &scatter.shares {
        let grip = share.interference.map_or("–".to_owned(), percent);
        line(out, format!("{:<25}{:>27}{:>27}", share.of, grip, percent(share.torque)));
    }
    let rest = 1.0 - scatter.shares.iter().map(|share| share.torque).sum::<f64>();
    line(out, format!("{:<25}{:>27}{:>27}", "jointly", "–", percent(rest.max(0.0))));
}

/// The population as JSON: fixed names, full precision, units in the names.
pub fn json(told: &Told<'_>) -> String {
    let scatter = told.scatter;
    let value = json!({
        "scatter": 1,
        "title": told.joint.title,
        "input_sha256": told.joint.digest,
        "samples": scatter.settings.samples,
        "seed": scatter.settings.seed,
        "confidence": CONFIDENCE,
        "engines_agree": agrees(scatter),
        "slip": scatter.slips.iter().map(event_json).collect::<Vec<_>>(),
        "yield": scatter.failures.iter().map(event_json).collect::<Vec<_>>(),
        "quantities": scatter.quantities.iter().map(|spread| spread_json(spread, scatter)).collect::<Vec<_>>(),
        "variance_shares": scatter.shares.iter().map(|share| json!({
            "of": share.of,
            "effective_interference": share.interference,
            "torque_capacity": share.torque,
        })).collect::<Vec<_>>(),
        "assumed": told.assumed,
    });
    let mut text = serde_json::to_string_pretty(&value).unwrap_or_default();
    text.push('\n');
    text
}

/// Whether both engines agree on every probability.
pub fn agrees(scatter: &Scatter) -> bool {
    scatter.slips.iter().chain(&scatter.failures).all(Event::agrees)
}

fn event_json(event: &Event) -> Value {
    json!({
        "what": event.what,
        "state": event.at,
        "probability": event.probability,
        "ppm": event.probability * 1e6,
        "counted": estimate_json(event.counted),
        "required_safety": event.required,
        "below_required": event.below_required,
        "counted_below_required": estimate_json(event.counted_below_required),
        "engines_agree": event.agrees(),
    })
}

fn estimate_json(estimate: Estimate) -> Value {
    let (low, high) = estimate.interval();
    let quoted = estimate.is_quotable();
    json!({
        "count": estimate.count,
        "samples": estimate.samples,
        "probability": if quoted { Value::from(estimate.share()) } else { Value::Null },
        "standard_error": if quoted { Value::from(estimate.standard_error()) } else { Value::Null },
        "interval_low": low,
        "interval_high": high,
    })
}

fn spread_json(spread: &Spread, scatter: &Scatter) -> Value {
    let (suffix, scale) = match measure(spread.quantity) {
        Measure::Deviation => ("um", 1e6),
        Measure::Pressure => ("mpa", 1e-6),
        Measure::Torque => ("nm", 1.0),
        _ => ("n", 1.0),
    };
    let (least, greatest) = scatter.model.limits(spread.quantity);
    json!({
        "quantity": spread.quantity.name(),
        "unit": suffix,
        "least": least * scale,
        "greatest": greatest * scale,
        "mean": spread.moments.0 * scale,
        "sd": spread.moments.1 * scale,
        "counted_mean": spread.sampled_moments.0 * scale,
        "counted_sd": spread.sampled_moments.1 * scale,
        "standard_error": spread.standard_error * scale,
        "percentiles": spread.percentiles.iter().map(|(level, integrated, counted)| json!({
            "share_below": level,
            "value": integrated * scale,
            "counted": counted * scale,
        })).collect::<Vec<_>>(),
    })
}

fn line(out: &mut String, text: impl AsRef<str>) {
    out.push_str(text.as_ref().trim_end());
    out.push('\n');
}

fn heading(out: &mut String, text: &str) {
    line(out, "");
    line(out, text);
}

fn paragraph(out: &mut String, first: &str, text: &str) {
    let rest = " ".repeat(first.chars().count());
    let options =
        textwrap::Options::new(WIDTH).initial_indent(first).subsequent_indent(&rest).break_words(false);
    for wrapped in textwrap::wrap(text, options) {
        line(out, wrapped);
    }
}
