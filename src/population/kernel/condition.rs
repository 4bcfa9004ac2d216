//! The shop and the service states of a plain joint: what they add to the interference, what they load.

use std::f64::consts::PI;

use super::ring::{self, RingBase};
use super::{Elasticity, KernelError, strain};
use crate::joint::{DutyState, Joint, Ring};
use crate::mechanics::capacity;
use crate::mechanics::ring::RingLoad;
use crate::mechanics::temperature::mean_temperature;

/// The shop or a service state: what it does to the interference, what load there is.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Condition {
    /// Young's modulus of the shaft, Pa.
    pub shaft_modulus: f64,
    /// Young's modulus of the hub, Pa.
    pub hub_modulus: f64,
    /// Contact pressure for each metre of interference, Pa/m.
    pub pressure_per_interference: f64,
    /// Interference that temperature, speed and pressures from outside add, m; negative when they take some.
    pub added_interference: f64,
    /// The part of it that comes from the temperatures of the mating faces alone, m: d (ε_shaft − ε_hub).
    pub thermal_interference: f64,
    /// Torque, N·m.
    pub torque: f64,
    /// Axial force, N.
    pub axial_force: f64,
    /// Share of the contact pressure that relaxation leaves for holding at the loosest pair, above 0 and at most 1.
    pub relaxation: f64,
    /// Safety against slip for each pascal of contact pressure, 1/Pa; none when there is no load.
    pub slip_safety_per_pressure: Option<f64>,
    /// Change of the contact pressure at the edges by bending and radial force, Pa; none without them.
    pub edge_change: Option<f64>,
    /// Stress of the shaft without contact.
    pub shaft: RingBase,
    /// Stress of the hub without contact.
    pub hub: RingBase,
}

/// What the conditions of a joint are made from.
pub(super) struct Conditions<'a> {
    pub(super) joint: &'a Joint,
    pub(super) inner: &'a Ring,
    pub(super) outer: &'a Ring,
    /// With the moduli of 20 °C.
    pub(super) elasticity: Elasticity,
}

impl Conditions<'_> {
    /// At rest, without load, both parts at one temperature (K).
    pub(super) fn at_rest(&self, temperature: f64) -> Result<Condition, KernelError> {
        let thermal =
            self.joint.diameter * (strain(self.inner, temperature)? - strain(self.outer, temperature)?);
        let (shaft_modulus, hub_modulus) =
            (modulus(self.inner, temperature, 0.0)?, modulus(self.outer, temperature, 0.0)?);
        Ok(Condition {
            shaft_modulus,
            hub_modulus,
            pressure_per_interference: self.gain(shaft_modulus, hub_modulus),
            added_interference: thermal,
            thermal_interference: thermal,
            torque: 0.0,
            axial_force: 0.0,
            relaxation: 1.0,
            slip_safety_per_pressure: None,
            edge_change: None,
            shaft: RingBase::default(),
            hub: RingBase::default(),
        })
    }

    pub(super) fn of_state(&self, state: &DutyState) -> Result<Condition, KernelError> {
        let joint = self.joint;
        let [at_shaft, at_hub] = state.temperatures.as_slice() else {
            return Err(KernelError::NotTwoRings(state.temperatures.len()));
        };
        let (shaft_strain, hub_strain) = (strain(self.inner, *at_shaft)?, strain(self.outer, *at_hub)?);
        let thermal = joint.diameter * (shaft_strain - hub_strain);
        let hotter = |number: usize| state.temperature_rises.get(number).copied().unwrap_or(0.0);
        let shaft_modulus = modulus(self.inner, *at_shaft, hotter(0))?;
        let hub_modulus = modulus(self.outer, *at_hub, hotter(1))?;
        let (shaft, hub, added) = if quiet(state) {
            (RingBase::default(), RingBase::default(), thermal)
        } else {
            let rise =
                |ring: &Ring, number: usize, from: f64, own: f64| match state.temperature_rises.get(number) {
                    Some(rise) => strain(ring, from + rise).map(|outside| outside - own),
                    None => Ok(0.0),
                };
            let load = RingLoad { angular_speed: state.speed, ..RingLoad::default() };
            let shaft_load = RingLoad {
                inner_pressure: state.inner_pressure,
                free_strain: shaft_strain,
                strain_rise: rise(self.inner, 0, *at_shaft, shaft_strain)?,
                ..load
            };
            let hub_load = RingLoad {
                outer_pressure: state.outer_pressure,
                free_strain: hub_strain,
                strain_rise: rise(self.outer, 1, *at_hub, hub_strain)?,
                ..load
            };
            let (rim, bore) = (0.5 * self.inner.outer_diameter, 0.5 * self.outer.inner_diameter);
            let (shaft, shaft_growth) = ring::base(self.inner, shaft_modulus, &shaft_load, rim)?;
            let (hub, hub_growth) = ring::base(self.outer, hub_modulus, &hub_load, bore)?;
            (shaft, hub, 2.0 * (shaft_growth - hub_growth))
        };
        Ok(Condition {
            shaft_modulus,
            hub_modulus,
            pressure_per_interference: self.gain(shaft_modulus, hub_modulus),
            added_interference: added,
            thermal_interference: thermal,
            torque: state.torque,
            axial_force: state.axial_force,
            relaxation: state.relaxation,
            slip_safety_per_pressure: self.slip_safety_per_pressure(state),
            edge_change: self.edge_change(state),
            shaft,
            hub,
        })
    }

    /// 1/(d (C_h/E_h + C_s/E_s)).
    fn gain(&self, shaft_modulus: f64, hub_modulus: f64) -> f64 {
        let warm = Elasticity { shaft_modulus, hub_modulus, ..self.elasticity };
        1.0 / (self.joint.diameter * warm.flexibility())
    }

    fn slip_safety_per_pressure(&self, state: &DutyState) -> Option<f64> {
        let joint = self.joint;
        let axial =
            capacity::axial(joint.friction.holding.value.low, 1.0, joint.diameter, joint.engaged_length());
        let loaded = state.torque > 0.0 || state.axial_force > 0.0;
        let torque = axial * joint.diameter / 2.0;
        loaded.then(|| capacity::slip_safety(state.torque, state.axial_force, torque, axial))
    }

    /// As the findings have it: 12 M/(π d L²) + 2 F/(π d L).
    fn edge_change(&self, state: &DutyState) -> Option<f64> {
        if state.bending_moment == 0.0 && state.radial_force == 0.0 {
            return None;
        }
        let (diameter, length) = (self.joint.diameter, self.joint.engaged_length());
        let radial = 2.0 * state.radial_force / (PI * diameter * length);
        Some(12.0 / (PI * diameter * length * length) * state.bending_moment + radial)
    }
}

/// Young's modulus of a ring (Pa) whose inner face is at a temperature (K) and whose outer face is hotter by `rise`: at
/// the mean temperature of its section.
fn modulus(ring: &Ring, inner: f64, rise: f64) -> Result<f64, KernelError> {
    let section = ring::section(ring, ring.material.youngs_modulus.value)?;
    let mean = mean_temperature(&section, inner, inner + rise)?;
    let outside = |cause| KernelError::Modulus { material: ring.material.name.clone(), cause };
    ring.material.youngs_modulus_at(mean).map_err(outside)
}

/// Whether nothing but uniform temperatures acts on the rings besides the contact.
fn quiet(state: &DutyState) -> bool {
    state.speed == 0.0
        && state.inner_pressure == 0.0
        && state.outer_pressure == 0.0
        && state.temperature_rises.is_empty()
}
