//! Limits, extreme interferences, smoothing.

use super::super::Findings;
use super::super::expression::{Expression, greatest, num, sym};
use super::Units;
use super::sheet::Sheet;
use crate::joint::SmoothingAt;
use crate::tolerance::FitLimits;

pub(super) fn write(sheet: &mut Sheet, findings: &Findings, units: &Units) {
    let joint = &findings.joint;
    let Some(fit) = joint.fits.first() else { return };
    sheet.section(format!("Fit {}: extreme interferences", fit.callout));
    sheet.input("d", "nominal diameter", joint.diameter * units.per_metre, units.length, "joint file");
    limits(sheet, &fit.limits, units, &fit.source);
    let to_small = |metres: f64| Some(metres * units.small_per_metre);
    let made = fit.limits.interference();
    let source = "ISO 286-1, clause 3.3 (interference positive)";
    sheet.formula(
        "U_min",
        "interference of the loosest pair",
        sym("ei") - sym("ES"),
        units.small,
        source,
        to_small(made.loosest),
    );
    sheet.formula(
        "U_max",
        "interference of the tightest pair",
        sym("es") - sym("EI"),
        units.small,
        source,
        to_small(made.tightest),
    );
    sheet.formula(
        "U_m",
        "interference of the mean pair",
        (sym("U_min") + sym("U_max")) / num("2"),
        units.small,
        "mean of both limits",
        None,
    );
    smoothing(sheet, findings, units);
}

fn limits(sheet: &mut Sheet, limits: &FitLimits, units: &Units, source: &str) {
    for (symbol, meaning, deviation) in [
        ("EI", "lower deviation of the hole", limits.hole.lower),
        ("ES", "upper deviation of the hole", limits.hole.upper),
        ("ei", "lower deviation of the shaft", limits.shaft.lower),
        ("es", "upper deviation of the shaft", limits.shaft.upper),
    ] {
        sheet.input(symbol, meaning, deviation * units.small_per_metre, units.small, source);
    }
}

fn smoothing(sheet: &mut Sheet, findings: &Findings, units: &Units) {
    let joint = &findings.joint;
    let (Some(shaft), Some(hub)) = (joint.rings.first(), joint.rings.last()) else { return };
    let loss = joint.smoothing.loss.first().copied().unwrap_or(0.0);
    sheet.section("Smoothing of the mating surfaces");
    let rule = joint.smoothing.rule.as_str();
    match joint.smoothing.factor {
        Some(factor) => {
            sheet.input(
                "Rz_s",
                "roughness of the shaft",
                shaft.roughness.value * units.small_per_metre,
                units.small,
                &shaft.roughness.source,
            );
            sheet.input(
                "Rz_h",
                "roughness of the hub bore",
                hub.roughness.value * units.small_per_metre,
                units.small,
                &hub.roughness.source,
            );
            sheet.input("f", "share of the peaks that flattens", factor, "", rule);
            sheet.formula(
                "G",
                "loss by smoothing",
                sym("f") * (sym("Rz_s") + sym("Rz_h")),
                units.small,
                rule,
                Some(loss * units.small_per_metre),
            );
        }
        None => sheet.input("G", "loss by smoothing", loss * units.small_per_metre, units.small, rule),
    }
    let lost_at_loosest = joint.smoothing.at != SmoothingAt::None;
    let lost_at_tightest = joint.smoothing.at == SmoothingAt::Both;
    for (symbol, made, name, lost, pair) in [
        ("W_min", "U_min", "loosest", lost_at_loosest, &findings.extremes.loosest),
        ("W_m", "U_m", "mean", lost_at_loosest, &findings.extremes.mean),
        ("W_max", "U_max", "tightest", lost_at_tightest, &findings.extremes.tightest),
    ] {
        let source =
            if lost { "effective interference, loss taken" } else { "effective interference, loss kept" };
        sheet.formula(
            symbol,
            &format!("interference that grips, {name} pair"),
            effective(made, lost, pair.interference),
            units.small,
            source,
            Some(pair.effective_interference * units.small_per_metre),
        );
    }
}

/// A clearance loses nothing; a grip is lost down to zero at most.
fn effective(made: &str, lost: bool, interference: f64) -> Expression {
    if !lost || interference <= 0.0 { sym(made) } else { greatest([num("0"), sym(made) - sym("G")]) }
}
