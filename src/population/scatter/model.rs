//! A plain joint with what scatters in it: the one model that both engines evaluate.
//!
//! | step | equation |
//! |---|---|
//! | interference | U = shaft − hole |
//! | loss | G = f (Rz shaft + Rz hub) |
//! | grip | V = U for U ≤ 0, else max(U − G, 0) (DIN 7190; contact ends at zero) |
//! | compliance | C = d (C_h/(k_h E_h) + C_s/(k_s E_s)), k modulus in the condition over that at 20 °C (Lamé) |
//! | temperature | θ = d (ε_shaft − ε_hub) + θ₀, θ₀ by speed, pressures from outside and heat flow at the mean moduli |
//! | pressure | p = max(V + θ, 0)/C |
//! | capacity | T = μ p π d² l/2, F = μ p π d l |
//! | slip | μ ρ p π d l < √(F² + (2 T/d)²), ρ the share that relaxation leaves |
//! | yield, fracture | p above the pressure at which a ring reaches its strength in the condition |
//! | press force | π d p (μ l + V (K − μ)²/(4 K tan φ)), K = (μ + tan φ)/(1 − μ tan φ) |

use std::f64::consts::PI;
use std::sync::Arc;

use super::{Quantity, ScatterError};
use crate::findings::after_smoothing;
use crate::material::{Material, Range};
use crate::population::distribution::Distribution;

/// What scatters from pair to pair.
#[derive(Debug, Clone, PartialEq)]
pub struct Population {
    /// Deviation of the hole from the nominal diameter, m.
    pub hole: Distribution,
    /// Deviation of the shaft from the nominal diameter, m.
    pub shaft: Distribution,
    /// Roughness Rz of the hub's bore, m.
    pub hub_roughness: Distribution,
    /// Roughness Rz of the shaft, m.
    pub shaft_roughness: Distribution,
    /// Friction against slip.
    pub friction: Distribution,
    /// Friction while pressing in.
    pub pressing: Distribution,
    /// Young's modulus of the hub, Pa.
    pub hub_modulus: Distribution,
    /// Young's modulus of the shaft, Pa.
    pub shaft_modulus: Distribution,
    /// Temperature of the hub above that of each service state, K.
    pub hub_temperature: Distribution,
    /// Temperature of the shaft above that of each service state, K.
    pub shaft_temperature: Distribution,
}

/// The joint with its population. SI throughout.
#[derive(Debug, Clone, PartialEq)]
pub struct Model {
    /// What scatters.
    pub population: Population,
    /// Share of the roughness sum that is lost on the diameter.
    pub smoothing_factor: f64,
    /// Whether the loss is taken for holding.
    pub loss_when_holding: bool,
    /// Whether the loss is taken for stress and press force.
    pub loss_under_stress: bool,
    /// Joint diameter, m.
    pub diameter: f64,
    /// Length that carries, m.
    pub engaged_length: f64,
    /// C_h of the hub.
    pub hub_factor: f64,
    /// C_s of the shaft.
    pub shaft_factor: f64,
    /// Equivalent stress of the hub for each pascal of contact pressure.
    pub hub_stress: f64,
    /// Tangent of the half-angle of the lead-in chamfer.
    pub chamfer_slope: f64,
    /// Interference that the shop temperature adds, m.
    pub shop_thermal: f64,
    /// Moduli at the shop temperature.
    pub shop_stiffness: Stiffness,
    /// Service states.
    pub states: Vec<State>,
    /// Rings that can give way.
    pub rings: Vec<Limit>,
    /// The arithmetic limits, to stand beside the statistical ones.
    pub arithmetic: Arithmetic,
}

/// The extreme pairs and the ranges of friction: what can happen at worst.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Arithmetic {
    /// Interference of the loosest and of the tightest pair, m.
    pub interference: Range,
    /// Friction against slip.
    pub friction: Range,
    /// Friction while pressing in.
    pub pressing: Range,
}

/// A service state.
#[derive(Debug, Clone, PartialEq)]
pub struct State {
    /// Its name.
    pub name: String,
    /// Resultant force on the mating surface, N, over the share ρ of the pressure that relaxation leaves for holding:
    /// √(F² + (2 T/d)²)/ρ.
    pub force: f64,
    /// Interference that its temperatures, speed and pressures from outside add, m; what speed and pressures add is that at
    /// the mean moduli.
    pub thermal: f64,
    /// Moduli at its temperatures; a scatter of the temperatures does not change them.
    pub stiffness: Stiffness,
    /// Temperatures and materials, for temperatures that scatter.
    pub warm: Option<Warm>,
}

/// Young's modulus of both rings in a condition over that at 20 °C.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Stiffness {
    /// Of the hub.
    pub hub: f64,
    /// Of the shaft.
    pub shaft: f64,
}

impl Default for Stiffness {
    fn default() -> Self {
        Self { hub: 1.0, shaft: 1.0 }
    }
}

/// Temperatures of a state with the materials that expand.
#[derive(Debug, Clone, PartialEq)]
pub struct Warm {
    /// Temperature of the shaft, K.
    pub shaft_temperature: f64,
    /// Temperature of the hub, K.
    pub hub_temperature: f64,
    /// Material of the shaft.
    pub shaft: Arc<Material>,
    /// Material of the hub.
    pub hub: Arc<Material>,
    /// Interference that speed, pressures from outside and the rise of temperature to the outer faces add, m.
    pub added: f64,
}

/// A ring with the contact pressure at which it gives way.
#[derive(Debug, Clone, PartialEq)]
pub struct Limit {
    /// Its name.
    pub name: String,
    /// What happens there: `yield` or `fracture`.
    pub failure: &'static str,
    /// Contact pressure at the shop temperature, at rest, Pa.
    pub pressure: f64,
    /// Safety that is required.
    pub required: f64,
    /// In each service state, with what speed, pressures from outside and heat flow stress: the contact pressure at which it
    /// gives way, and that at which it falls below the safety required, Pa; negative where it does so without contact. A
    /// state that is not here is as the shop.
    pub in_states: Vec<[f64; 2]>,
}

impl Limit {
    /// Contact pressures (Pa) at which the ring gives way, and at which it falls below the safety required, in a condition:
    /// 0 is the shop, then the states.
    pub fn in_condition(&self, condition: usize) -> [f64; 2] {
        let state = condition.checked_sub(1).and_then(|state| self.in_states.get(state));
        state.copied().unwrap_or([self.pressure, self.pressure / self.required])
    }
}

impl Model {
    /// Area that carries, m²: π d l.
    pub fn area(&self) -> f64 {
        PI * self.diameter * self.engaged_length
    }

    /// Torque (N·m) for each newton of friction force: d/2.
    pub fn arm(&self) -> f64 {
        0.5 * self.diameter
    }

    /// Interference (m) for each pascal of pressure at the shop temperature; moduli (Pa) of 20 °C.
    #[inline]
    pub fn compliance(&self, hub_modulus: f64, shaft_modulus: f64) -> f64 {
        self.compliance_with(self.shop_stiffness, hub_modulus, shaft_modulus)
    }

    /// The same in a condition of this stiffness.
    #[inline]
    pub fn compliance_with(&self, stiffness: Stiffness, hub_modulus: f64, shaft_modulus: f64) -> f64 {
        let (hub, shaft) = (stiffness.hub * hub_modulus, stiffness.shaft * shaft_modulus);
        self.diameter * (self.hub_factor / hub + self.shaft_factor / shaft)
    }

    /// Moduli of a condition.
    pub fn stiffness(&self, condition: usize) -> Stiffness {
        match condition.checked_sub(1).and_then(|state| self.states.get(state)) {
            Some(state) => state.stiffness,
            None => self.shop_stiffness,
        }
    }

    /// Factor (K − μ)²/(4 K tan φ) of the chamfer in the press force.
    #[inline]
    pub fn chamfer_factor(&self, friction: f64) -> f64 {
        // With K written out: tan φ (1 + μ²)²/(4 (1 − μ tan φ)(μ + tan φ)).
        let slope = self.chamfer_slope;
        let square = 1.0 + friction * friction;
        slope * square * square / (4.0 * (1.0 - friction * slope) * (friction + slope))
    }

    /// Greatest press-in force, N, of a grip (m), a compliance (m/Pa) and a friction, at the shop temperature.
    pub fn press_force(&self, grip: f64, compliance: f64, friction: f64) -> f64 {
        let overlap = (grip + self.shop_thermal).max(0.0);
        let along = friction * self.engaged_length + overlap * self.chamfer_factor(friction);
        PI * self.diameter * (overlap / compliance) * along
    }

    /// Least and greatest value of a quantity by the arithmetic limits; roughness and moduli are at their means.
    pub fn limits(&self, quantity: Quantity) -> (f64, f64) {
        let population = &self.population;
        let loss =
            self.smoothing_factor * (population.hub_roughness.mean() + population.shaft_roughness.mean());
        let compliance = self.compliance(population.hub_modulus.mean(), population.shaft_modulus.mean());
        let Arithmetic { interference, friction, pressing } = self.arithmetic;
        let grip = |made: f64, taken: bool| if taken { after_smoothing(made, loss) } else { made };
        let hold = |made: f64| grip(made, self.loss_when_holding);
        let stress = |made: f64| grip(made, self.loss_under_stress);
        let pressure = |grip: f64| (grip + self.shop_thermal).max(0.0) / compliance;
        let ends = |of: &dyn Fn(f64) -> f64| (of(interference.low), of(interference.high));
        match quantity {
            Quantity::Interference => (interference.low, interference.high),
            Quantity::EffectiveInterference => ends(&hold),
            Quantity::Pressure => ends(&|made| pressure(hold(made))),
            Quantity::HubStress => ends(&|made| pressure(stress(made)) * self.hub_stress),
            Quantity::TorqueCapacity => {
                let (low, high) = ends(&|made| pressure(hold(made)) * self.area() * self.arm());
                (low * friction.low, high * friction.high)
            }
            Quantity::PressForce => (
                self.press_force(stress(interference.low), compliance, pressing.low),
                self.press_force(stress(interference.high), compliance, pressing.high),
            ),
        }
    }

    /// Conditions in which a ring may give way: the shop first, then each state.
    pub fn conditions(&self) -> usize {
        1 + self.states.len()
    }

    /// Name of a condition.
    pub fn condition_name(&self, condition: usize) -> &str {
        match condition.checked_sub(1).and_then(|state| self.states.get(state)) {
            Some(state) => &state.name,
            None => "shop temperature",
        }
    }

    /// Interference that condition adds at the stated temperatures, m.
    pub fn thermal(&self, condition: usize) -> f64 {
        match condition.checked_sub(1).and_then(|state| self.states.get(state)) {
            Some(state) => state.thermal,
            None => self.shop_thermal,
        }
    }

    /// Checks that every quantity stays where the formulas hold.
    ///
    /// # Errors
    /// A friction, a modulus or a roughness that may fall to zero or below; sizes and lengths that are not positive;
    /// temperatures that leave an expansion curve.
    pub fn check(&self) -> Result<(), ScatterError> {
        let population = &self.population;
        let positive = [
            ("friction", &population.friction),
            ("pressing_friction", &population.pressing),
            ("hub_youngs_modulus", &population.hub_modulus),
            ("shaft_youngs_modulus", &population.shaft_modulus),
        ];
        for (what, distribution) in positive {
            if distribution.support().0 <= 0.0 {
                return Err(ScatterError::ReachesZero { what });
            }
        }
        for (what, distribution) in
            [("hub_roughness", &population.hub_roughness), ("shaft_roughness", &population.shaft_roughness)]
        {
            if distribution.support().0 < 0.0 {
                return Err(ScatterError::ReachesZero { what });
            }
        }
        for (what, friction) in
            [("friction", &population.friction), ("pressing_friction", &population.pressing)]
        {
            if friction.support().1 > 1.0 {
                return Err(ScatterError::FrictionAboveOne { what });
            }
        }
        for value in [self.diameter, self.engaged_length, self.chamfer_slope, self.hub_factor] {
            if !(value.is_finite() && value > 0.0) {
                return Err(ScatterError::Geometry { given: value });
            }
        }
        if self.scatters_in_temperature() {
            self.check_temperatures()?;
        }
        Ok(())
    }

    /// Whether a temperature scatters.
    pub fn scatters_in_temperature(&self) -> bool {
        let population = &self.population;
        population.hub_temperature.only_value() != Some(0.0)
            || population.shaft_temperature.only_value() != Some(0.0)
    }

    fn check_temperatures(&self) -> Result<(), ScatterError> {
        let population = &self.population;
        for state in &self.states {
            let Some(warm) = &state.warm else { continue };
            for (material, temperature, offset) in [
                (&warm.hub, warm.hub_temperature, population.hub_temperature.support()),
                (&warm.shaft, warm.shaft_temperature, population.shaft_temperature.support()),
            ] {
                for end in [offset.0, offset.1] {
                    if material.expansion.strain(temperature + end).is_err() {
                        return Err(ScatterError::Temperature {
                            state: state.name.clone(),
                            material: material.name.clone(),
                        });
                    }
                }
            }
        }
        Ok(())
    }
}

impl Warm {
    /// Interference (m) that the temperatures with these offsets (K) add at a diameter (m); a temperature beyond its
    /// curve counts as the end of it, which [`Model::check`] has ruled out.
    pub fn thermal(&self, diameter: f64, shaft_offset: f64, hub_offset: f64) -> f64 {
        let strain = |material: &Material, temperature: f64| {
            let (low, high) = material.expansion.range();
            material.expansion.strain(temperature.clamp(low, high)).unwrap_or(0.0)
        };
        self.added
            + diameter
                * (strain(&self.shaft, self.shaft_temperature + shaft_offset)
                    - strain(&self.hub, self.hub_temperature + hub_offset))
    }
}
