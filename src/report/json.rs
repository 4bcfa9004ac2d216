//! Findings as JSON, version 1: fixed names, units in the names, full precision.
//!
//! NaN and infinity never appear: a quantity that does not exist is `null`, and `notes` says why. Names are
//! only ever added.

mod service;
mod shape;

use serde::Serialize;

use crate::findings::Findings;
use crate::tolerance::callout::{Resolved, ResolvedMember};
use crate::tolerance::{Limits, Member};
use shape::{Document, ExtremeInterferences, LimitsDocument, MemberDocument, Microns};

/// The findings of a joint as JSON text with a line break at its end.
pub fn to_json(findings: &Findings) -> String {
    text(&Document::of(findings))
}

/// Limits of a fit as JSON: the object `fit` as in the findings, `character`, `interference`.
pub fn fit_limits(callout: &str, resolved: &Resolved) -> String {
    let limits = &resolved.limits;
    let interference = limits.interference();
    text(&LimitsDocument {
        callout: callout.to_owned(),
        diameter_mm: limits.nominal * 1e3,
        fit: shape::Fit::of(limits),
        character: super::terminal::character_name(limits.character()),
        interference: ExtremeInterferences {
            loosest_um: microns(interference.loosest),
            mean_um: microns(interference.mean),
            tightest_um: microns(interference.tightest),
        },
        maximum_material_pair: "tightest",
        least_material_pair: "loosest",
        sources: vec![resolved.hole_source.clone(), resolved.shaft_source.clone()],
        remarks: resolved.remarks.clone(),
    })
}

/// Limits of one member as JSON.
pub fn member_limits(nominal: f64, member: Member, resolved: &ResolvedMember) -> String {
    let limits = Microns::of(&resolved.limits);
    let (hole, shaft) = match member {
        Member::Hole => (Some(limits), None),
        Member::Shaft => (None, Some(limits)),
    };
    text(&MemberDocument {
        diameter_mm: nominal * 1e3,
        hole,
        shaft,
        sources: vec![resolved.source.clone()],
        remarks: resolved.remarks.clone(),
    })
}

fn text(document: &impl Serialize) -> String {
    let mut text = serde_json::to_string_pretty(document).unwrap_or_default();
    text.push('\n');
    text
}

/// Micrometres of a length in m, without the noise that the factor would add to tabulated figures.
fn microns(metres: f64) -> f64 {
    let exact = metres * 1e6;
    let rounded = (exact * 1e6).round() / 1e6;
    let kept = if (exact - rounded).abs() <= 1e-9 * exact.abs() { rounded } else { exact };
    kept + 0.0
}

/// A number that JSON can carry; none when it is not finite.
fn finite(value: f64) -> Option<f64> {
    value.is_finite().then_some(value + 0.0)
}

impl Microns {
    fn of(limits: &Limits) -> Self {
        Self { lower_um: microns(limits.lower), upper_um: microns(limits.upper) }
    }
}
