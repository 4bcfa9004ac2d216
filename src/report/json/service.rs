//! The part of the JSON document about the joint at work.

use serde::Serialize;

use super::number::{celsius, finite, mega, microns, millimetres, rpm};
use crate::findings::{BendingFindings, Findings};
use crate::mechanics::plastic::Regime;

/// Edge pressures under bending.
#[derive(Serialize)]
pub(super) struct Bending {
    edge_change_mpa: Option<f64>,
    least_edge_mpa: Option<f64>,
    greatest_edge_mpa: Option<f64>,
    limiting_moment_nm: Option<f64>,
}

impl Bending {
    pub(super) fn of(found: &BendingFindings) -> Self {
        Self {
            edge_change_mpa: mega(found.edge_change),
            least_edge_mpa: mega(found.least_edge),
            greatest_edge_mpa: mega(found.greatest_edge),
            limiting_moment_nm: finite(found.limiting_moment),
        }
    }
}

/// What loosens the joint, which fits govern, the plastic hub, fatigue. Interfaces and fits count from 1.
#[derive(Serialize)]
pub(super) struct Service {
    loosening: Vec<Loosening>,
    governing: Vec<Governing>,
    steps: Vec<Step>,
    plastic: Option<Plastic>,
    fatigue: Vec<Fatigue>,
    finite_length: Option<FiniteLength>,
    liner: Option<Liner>,
}

/// A hub of finite length on a shaft that stands out, beside the thick-walled cylinder of the extremes.
#[derive(Serialize)]
struct FiniteLength {
    mean_pressure_factor: f64,
    edge_pressure_factor: f64,
    loosest_mean_pressure_mpa: Option<f64>,
    tightest_mean_pressure_mpa: Option<f64>,
}

/// A thin bush pressed inwards by its housing.
#[derive(Serialize)]
struct Liner {
    wall_over_diameter: f64,
    pressure_mpa: Option<f64>,
    buckling_free_mpa: Option<f64>,
    buckling_housed_mpa: Option<f64>,
}

/// What opens an interface of the loosest pair; null where nothing does.
#[derive(Serialize)]
struct Loosening {
    interface: usize,
    speed_rpm: Option<f64>,
    temperature_c: Option<f64>,
    outer_temperature_c: Option<f64>,
}

/// The combination of fits that governs a ring.
#[derive(Serialize)]
struct Governing {
    ring: String,
    combination: String,
    state: Option<String>,
    equivalent_mpa: Option<f64>,
    safety: Option<f64>,
}

/// Equivalent stress of each ring after a step of assembly.
#[derive(Serialize)]
struct Step {
    fit: usize,
    equivalent_mpa: Vec<Option<f64>>,
}

/// The hub beyond its elastic limit at the tightest pair; null while it is elastic.
#[derive(Serialize)]
struct Plastic {
    rule: &'static str,
    regime: &'static str,
    pressure_mpa: Option<f64>,
    limit_pressure_mpa: Option<f64>,
    plastic_diameter_mm: f64,
    plastic_share: f64,
    permanent_growth_um: f64,
    growth_after_duty_um: Option<f64>,
}

/// Rotating bending at the hub edge.
#[derive(Serialize)]
struct Fatigue {
    state: String,
    nominal_stress_mpa: Option<f64>,
    notch_factor_low: f64,
    notch_factor_high: f64,
    size_factor: f64,
    surface_factor: f64,
    reduction_low: f64,
    reduction_high: f64,
    safety_low: Option<f64>,
    safety_high: Option<f64>,
}

impl Service {
    pub(super) fn of(findings: &Findings) -> Self {
        let joint = &findings.joint;
        let service = &findings.service;
        let state = |index: usize| joint.duty.get(index).map(|state| state.name.clone());
        let loosening = service.loosening.iter().enumerate().map(|(index, loosening)| Loosening {
            interface: index + 1,
            speed_rpm: loosening.speed.map(rpm),
            temperature_c: loosening.temperature.map(celsius),
            outer_temperature_c: loosening.outer_temperature.map(celsius),
        });
        let governing = joint.rings.iter().zip(&service.governing).map(|(ring, governing)| Governing {
            ring: ring.name.clone(),
            combination: crate::findings::combination(&governing.tight),
            state: governing.state.and_then(state),
            equivalent_mpa: mega(governing.equivalent),
            safety: governing.safety.and_then(finite),
        });
        let steps = service.steps.iter().map(|step| Step {
            fit: step.interface + 1,
            equivalent_mpa: step.rings.iter().map(|ring| mega(ring.equivalent)).collect(),
        });
        let fatigue = service.fatigue.iter().map(|fatigue| Fatigue {
            state: state(fatigue.state).unwrap_or_default(),
            nominal_stress_mpa: mega(fatigue.nominal_stress),
            notch_factor_low: fatigue.notch_factor.low,
            notch_factor_high: fatigue.notch_factor.high,
            size_factor: fatigue.size_factor,
            surface_factor: fatigue.surface_factor,
            reduction_low: fatigue.reduction.low,
            reduction_high: fatigue.reduction.high,
            safety_low: finite(fatigue.safety.low),
            safety_high: finite(fatigue.safety.high),
        });
        Self {
            loosening: loosening.collect(),
            governing: governing.collect(),
            steps: steps.collect(),
            plastic: plastic(findings),
            fatigue: fatigue.collect(),
            finite_length: service.length_factors.map(|factors| FiniteLength {
                mean_pressure_factor: factors.mean_pressure,
                edge_pressure_factor: factors.edge_pressure,
                loosest_mean_pressure_mpa: mega(findings.extremes.loosest.pressure * factors.mean_pressure),
                tightest_mean_pressure_mpa: mega(findings.extremes.tightest.pressure * factors.mean_pressure),
            }),
            liner: service.liner.map(|liner| Liner {
                wall_over_diameter: liner.slenderness,
                pressure_mpa: mega(liner.pressure),
                buckling_free_mpa: mega(liner.free),
                buckling_housed_mpa: mega(liner.housed),
            }),
        }
    }
}

fn plastic(findings: &Findings) -> Option<Plastic> {
    let plastic = findings.service.plastic.as_ref()?;
    let state = &plastic.tightest;
    let regime = match state.regime {
        Regime::Elastic => return None,
        Regime::ElasticPlastic => "elastic-plastic",
        Regime::FullyPlastic => "fully plastic",
        Regime::PressureCap => "pressure cap",
    };
    Some(Plastic {
        rule: state.rule.name(),
        regime,
        pressure_mpa: mega(state.pressure),
        limit_pressure_mpa: mega(plastic.limits.limit_pressure),
        plastic_diameter_mm: millimetres(state.plastic_diameter),
        plastic_share: state.plastic_share,
        permanent_growth_um: microns(state.permanent.bore),
        growth_after_duty_um: plastic.worn.as_ref().map(|worn| microns(worn.tightest)),
    })
}
