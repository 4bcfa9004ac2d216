//! Limits of a fit, of `check --json` and of `limits --json`.

use serde::Serialize;

use super::number::{microns, millimetres};
use crate::report::terminal::character_name;
use crate::tolerance::callout::{Resolved, ResolvedMember};
use crate::tolerance::{FitLimits, Limits, Member};

/// Limits of both members.
#[derive(Serialize)]
pub(super) struct Fit {
    hole: Microns,
    shaft: Microns,
}

/// Deviations of one member from nominal.
#[derive(Serialize)]
struct Microns {
    lower_um: f64,
    upper_um: f64,
}

/// What `limits --json` prints of a fit.
#[derive(Serialize)]
pub(super) struct LimitsDocument {
    callout: String,
    diameter_mm: f64,
    fit: Fit,
    character: &'static str,
    interference: ExtremeInterferences,
    maximum_material_pair: &'static str,
    least_material_pair: &'static str,
    sources: Vec<String>,
    remarks: Vec<String>,
}

/// Interference of the extreme pairs, negative for clearance.
#[derive(Serialize)]
struct ExtremeInterferences {
    loosest_um: f64,
    mean_um: f64,
    tightest_um: f64,
}

/// What `limits --json` prints of one member: the other is left out.
#[derive(Serialize)]
pub(super) struct MemberDocument {
    diameter_mm: f64,
    #[serde(skip_serializing_if = "Option::is_none")]
    hole: Option<Microns>,
    #[serde(skip_serializing_if = "Option::is_none")]
    shaft: Option<Microns>,
    sources: Vec<String>,
    remarks: Vec<String>,
}

impl Fit {
    pub(super) fn of(limits: &FitLimits) -> Self {
        Self { hole: Microns::of(&limits.hole), shaft: Microns::of(&limits.shaft) }
    }
}

impl Microns {
    fn of(limits: &Limits) -> Self {
        Self { lower_um: microns(limits.lower), upper_um: microns(limits.upper) }
    }
}

impl LimitsDocument {
    pub(super) fn of(callout: &str, resolved: &Resolved) -> Self {
        let limits = &resolved.limits;
        let interference = limits.interference();
        Self {
            callout: callout.to_owned(),
            diameter_mm: millimetres(limits.nominal),
            fit: Fit::of(limits),
            character: character_name(limits.character()),
            interference: ExtremeInterferences {
                loosest_um: microns(interference.loosest),
                mean_um: microns(interference.mean),
                tightest_um: microns(interference.tightest),
            },
            maximum_material_pair: "tightest",
            least_material_pair: "loosest",
            sources: vec![resolved.hole_source.clone(), resolved.shaft_source.clone()],
            remarks: resolved.remarks.clone(),
        }
    }
}

impl MemberDocument {
    pub(super) fn of(nominal: f64, member: Member, resolved: &ResolvedMember) -> Self {
        let limits = Microns::of(&resolved.limits);
        let (hole, shaft) = match member {
            Member::Hole => (Some(limits), None),
            Member::Shaft => (None, Some(limits)),
        };
        Self {
            diameter_mm: millimetres(nominal),
            hole,
            shaft,
            sources: vec![resolved.source.clone()],
            remarks: resolved.remarks.clone(),
        }
    }
}
