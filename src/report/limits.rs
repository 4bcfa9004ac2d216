//! Limits of a fit as text.

use std::fmt::Write;

use super::terminal::{WIDTH, character_name};
use crate::quantity::{Measure, UnitSystem, display_unit, show};
use crate::tolerance::callout::{Resolved, ResolvedMember};
use crate::tolerance::{Limits, Member, Pair};

/// Limits of both members, extreme interferences with the material condition, and the kind of fit.
pub fn fit_text(callout: &str, fit: &Resolved, system: UnitSystem) -> String {
    let limits = &fit.limits;
    let mut out = String::new();
    let size = show(Measure::Size, limits.nominal, system);
    let _ = writeln!(out, "{size}  {callout}: {} fit\n", character_name(limits.character()));
    header(&mut out, system);
    member(&mut out, "hole", limits.nominal, &limits.hole, system);
    member(&mut out, "shaft", limits.nominal, &limits.shaft, system);
    let interference = limits.interference();
    let unit = display_unit(Measure::Deviation, system).name;
    let _ =
        writeln!(out, "\n{:34}{:>14}  {:>12}  {:>12}", "", format!("interference, {unit}"), "hole", "shaft");
    pair(
        &mut out,
        "loosest  (least-material pair)",
        interference.loosest,
        &limits.least_material(),
        limits.nominal,
        system,
    );
    pair(&mut out, "mean", interference.mean, &limits.pairs().mean, limits.nominal, system);
    pair(
        &mut out,
        "tightest (maximum-material pair)",
        interference.tightest,
        &limits.maximum_material(),
        limits.nominal,
        system,
    );
    out.push('\n');
    remark(&mut out, "hole:  ", &fit.hole_source);
    remark(&mut out, "shaft: ", &fit.shaft_source);
    remark(&mut out, "", "Interference is shaft minus hole on the diameter; a negative figure is clearance.");
    for text in &fit.remarks {
        remark(&mut out, "! ", text);
    }
    out
}

/// Limits of one member.
pub fn member_text(
    class: &str,
    nominal: f64,
    which: Member,
    resolved: &ResolvedMember,
    system: UnitSystem,
) -> String {
    let name = match which {
        Member::Hole => "hole",
        Member::Shaft => "shaft",
    };
    let mut out = String::new();
    let _ = writeln!(out, "{}  {}\n", show(Measure::Size, nominal, system), class.trim());
    header(&mut out, system);
    member(&mut out, name, nominal, &resolved.limits, system);
    out.push('\n');
    remark(&mut out, "", &resolved.source);
    for text in &resolved.remarks {
        remark(&mut out, "! ", text);
    }
    out
}

fn header(out: &mut String, system: UnitSystem) {
    let deviation = display_unit(Measure::Deviation, system).name;
    let size = display_unit(Measure::Size, system).name;
    let _ = writeln!(
        out,
        "{:8}{:>12}{:>12}{:>16}{:>16}",
        "",
        format!("lower, {deviation}"),
        format!("upper, {deviation}"),
        format!("smallest, {size}"),
        format!("largest, {size}")
    );
}

fn member(out: &mut String, name: &str, nominal: f64, limits: &Limits, system: UnitSystem) {
    let _ = writeln!(
        out,
        "{name:8}{:>12}{:>12}{:>16}{:>16}",
        signed(limits.lower, system),
        signed(limits.upper, system),
        size(nominal, limits.lower, system),
        size(nominal, limits.upper, system)
    );
}

fn pair(out: &mut String, name: &str, interference: f64, pair: &Pair, nominal: f64, system: UnitSystem) {
    let _ = writeln!(
        out,
        "{name:34}{:>14}  {:>12}  {:>12}",
        signed(interference, system),
        size(nominal, pair.hole, system),
        size(nominal, pair.shaft, system)
    );
}

/// A deviation with its sign, as tables print it.
fn signed(deviation: f64, system: UnitSystem) -> String {
    let number = show(Measure::Deviation, deviation, system).number;
    if deviation > 0.0 { format!("+{number}") } else { number }
}

/// A limit of size to the resolution of its deviation: 0.1 µm or 0.01 thou.
fn size(nominal: f64, deviation: f64, system: UnitSystem) -> String {
    let (per_metre, decimals) = match system {
        UnitSystem::Metric => (1e3, 4),
        UnitSystem::Inch => (1.0 / 0.0254, 5),
    };
    let text = format!("{:.decimals$}", (nominal + deviation) * per_metre);
    match text.strip_suffix('0') {
        Some(shorter) => shorter.to_owned(),
        None => text,
    }
}

fn remark(out: &mut String, first: &str, text: &str) {
    let hang = " ".repeat(first.chars().count());
    let options = textwrap::Options::new(WIDTH).initial_indent(first).subsequent_indent(&hang);
    for line in textwrap::wrap(text, options) {
        let _ = writeln!(out, "{line}");
    }
}
