//! The part of the JSON document about a bearing seat.

use serde::Serialize;

use super::number::{celsius, finite, mega, microns, millimetres};
use crate::assembly::bearing_tables::BearingRing;
use crate::findings::{BearingFindings, Findings};
use crate::material::Range;

/// A range of lengths.
#[derive(Serialize)]
struct Span {
    least_um: f64,
    greatest_um: f64,
}

impl Span {
    fn of(range: Range) -> Self {
        Self { least_um: microns(range.low), greatest_um: microns(range.high) }
    }
}

/// What is left of the clearance in a state.
#[derive(Serialize)]
struct State {
    state: String,
    inner_hotter_by_k: f64,
    loss: Span,
    left: Span,
}

/// What the seat does to the bearing.
#[derive(Serialize)]
pub(super) struct Bearing {
    ring: &'static str,
    bore_mm: f64,
    outside_diameter_mm: f64,
    width_mm: f64,
    inner_raceway_mm: f64,
    outer_raceway_mm: f64,
    clearance_group: String,
    clearance_before: Span,
    clearance_source: String,
    clearance_loss: Span,
    clearance_mounted: Span,
    states: Vec<State>,
    hoop_stress_loosest_mpa: Option<f64>,
    hoop_stress_tightest_mpa: Option<f64>,
    mounting_force_n: Option<f64>,
    pull_off_force_n: Option<f64>,
    mounting_temperature_c: Option<f64>,
    mounting_temperature_within_limit: bool,
}

impl Bearing {
    pub(super) fn of(findings: &Findings) -> Option<Self> {
        let (found, seat) = (findings.bearing.as_ref()?, findings.joint.bearing.as_ref()?);
        Some(Self {
            ring: match seat.ring {
                BearingRing::Inner => "inner",
                BearingRing::Outer => "outer",
            },
            bore_mm: millimetres(seat.bore),
            outside_diameter_mm: millimetres(seat.outside_diameter),
            width_mm: millimetres(seat.width),
            inner_raceway_mm: millimetres(seat.inner_raceway),
            outer_raceway_mm: millimetres(seat.outer_raceway),
            clearance_group: format!("{:?}", seat.clearance),
            clearance_before: Span::of(found.before.value),
            clearance_source: found.before.source.to_string(),
            clearance_loss: Span::of(Range { low: found.loss.loosest, high: found.loss.tightest }),
            clearance_mounted: Span::of(found.mounted),
            states: states(findings, found),
            hoop_stress_loosest_mpa: mega(found.hoop_stress.loosest),
            hoop_stress_tightest_mpa: mega(found.hoop_stress.tightest),
            mounting_force_n: finite(found.mounting_force),
            pull_off_force_n: finite(found.pull_off_force),
            mounting_temperature_c: found.mounting_temperature.map(celsius),
            mounting_temperature_within_limit: found.mounting_possible,
        })
    }
}

fn states(findings: &Findings, found: &BearingFindings) -> Vec<State> {
    let states = findings.joint.duty.iter().zip(&found.states);
    states
        .map(|(state, left)| State {
            state: state.name.clone(),
            inner_hotter_by_k: left.inner_hotter_by,
            loss: Span::of(left.loss),
            left: Span::of(left.left),
        })
        .collect()
}
