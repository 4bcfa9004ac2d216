//! The service states: what acts, and what is found of both extreme pairs.

use serde::Serialize;

use super::number::{celsius, finite, giga, mega, rpm};
use super::pair::{Interface, Ring, rings};
use super::service::Bending;
use crate::findings::{DutyFindings, RingStress, StateFindings};
use crate::joint::{DutyState, Joint};

/// One service state: what acts, and both extreme pairs in it.
#[derive(Serialize)]
pub(super) struct Duty {
    state: String,
    torque_nm: f64,
    axial_force_n: f64,
    speed_rpm: f64,
    temperatures_c: Vec<f64>,
    temperature_rises_k: Vec<f64>,
    youngs_moduli_gpa: Vec<f64>,
    inner_pressure_mpa: Option<f64>,
    outer_pressure_mpa: Option<f64>,
    bending_moment_nm: f64,
    radial_force_n: f64,
    rotating_bending: bool,
    reversing: bool,
    relaxation: f64,
    loosest: State,
    tightest: State,
}

/// One pair in one service state.
#[derive(Serialize)]
struct State {
    pressure_mpa: Option<f64>,
    torque_capacity_nm: Option<f64>,
    axial_capacity_n: Option<f64>,
    slip_safety: Option<f64>,
    hub_yield_safety: Option<f64>,
    shaft_yield_safety: Option<f64>,
    bending: Option<Bending>,
    interfaces: Vec<Interface>,
    rings: Vec<Ring>,
}

impl Duty {
    pub(super) fn of(joint: &Joint, state: &DutyState, found: &DutyFindings) -> Self {
        Self {
            state: state.name.clone(),
            torque_nm: state.torque,
            axial_force_n: state.axial_force,
            speed_rpm: rpm(state.speed),
            temperatures_c: state.temperatures.iter().map(|temperature| celsius(*temperature)).collect(),
            temperature_rises_k: state.temperature_rises.clone(),
            youngs_moduli_gpa: found.youngs_moduli.iter().map(|modulus| giga(*modulus)).collect(),
            inner_pressure_mpa: mega(state.inner_pressure),
            outer_pressure_mpa: mega(state.outer_pressure),
            bending_moment_nm: state.bending_moment,
            radial_force_n: state.radial_force,
            rotating_bending: state.rotating_bending,
            reversing: state.reversing,
            relaxation: state.relaxation,
            loosest: State::of(joint, &found.loosest),
            tightest: State::of(joint, &found.tightest),
        }
    }
}

impl State {
    fn of(joint: &Joint, found: &StateFindings) -> Self {
        let safety = |ring: Option<&RingStress>| ring.and_then(|ring| ring.safety).and_then(finite);
        Self {
            pressure_mpa: mega(found.pressure),
            torque_capacity_nm: finite(found.torque_capacity),
            axial_capacity_n: finite(found.axial_capacity),
            slip_safety: found.slip_safety.and_then(finite),
            hub_yield_safety: safety(found.rings.last()),
            shaft_yield_safety: safety(found.rings.first()),
            bending: found.bending.as_ref().map(Bending::of),
            interfaces: found.interfaces.iter().map(Interface::of).collect(),
            rings: rings(joint, &found.rings),
        }
    }
}
