//! A joint of two rings, prepared once and then evaluated as often as wanted without allocation.
//!
//! The numbers are those of [`compute`](crate::findings::compute), to rounding: the same formulas with what does
//! not change from pair to pair taken out. The contact pressure is linear in the interference until the parts
//! open, as steeply as the moduli at the temperatures of the condition make it, and every stress is linear in the
//! pressure; temperature, speed and pressures from outside shift both.
//!
//! Covered are two rings of one section each that stay elastic. More rings, stepped parts and a hub that may yield
//! by design are left to the full computation.
//!
//! [`PlainJoint::of`] prepares; [`PlainJoint::pair`] and [`PlainJoint::state`] evaluate one pair;
//! [`PlainJoint::pressures`] and its neighbours go through arrays in loops that the compiler can vectorise.
//! [`joining`] finds the temperatures for joining hot or cold.

mod condition;
pub mod joining;
mod ring;

use std::f64::consts::PI;

use thiserror::Error;

use crate::assembly::AssemblyError;
use crate::assembly::press::{self, PressInput};
use crate::findings::after_smoothing;
use crate::joint::{Allow, Joint, Ring, SmoothingAt};
use crate::material::Range;
use crate::mechanics::{MechanicsError, capacity};
use crate::numerics::interpolation::InterpolationError;

pub use condition::Condition;
use condition::Conditions;
pub use ring::{PlainRing, RingBase, RingValues};

/// Why a joint cannot be evaluated by the kernel; the full computation may still cover it.
#[derive(Debug, Clone, PartialEq, Error)]
pub enum KernelError {
    /// It is not a joint of two rings.
    #[error("a joint of {0} rings is not a plain joint: it must have two")]
    NotTwoRings(usize),
    /// Its hub or shaft is stepped.
    #[error("a stepped joint is not a plain joint: hub and shaft must be of one section")]
    Stepped,
    /// Its hub may yield by design.
    #[error("a joint whose hub may yield by design is not a plain joint: it must be elastic")]
    MayYield,
    /// A ring was refused by the ring formulas.
    #[error(transparent)]
    Mechanics(#[from] MechanicsError),
    /// A pressing was refused by the press formulas.
    #[error(transparent)]
    Assembly(#[from] AssemblyError),
    /// A temperature lies outside the curve of Young's modulus of a material.
    #[error("the curve of Young's modulus of {material} does not reach the temperature asked for: {cause}")]
    Modulus {
        /// Name of the material.
        material: String,
        /// The range and the temperature.
        cause: InterpolationError,
    },
    /// A temperature lies outside the expansion curve of a material.
    #[error("the expansion curve of {material} does not reach the temperature asked for: {cause}")]
    Expansion {
        /// Name of the material.
        material: String,
        /// The range and the temperature.
        cause: InterpolationError,
    },
}

/// Which of the three pairs of parts is meant; it decides whether the smoothing loss is taken.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum PairKind {
    /// Largest hole with smallest shaft.
    Loosest,
    /// Middle of both tolerances.
    Mean,
    /// Smallest hole with largest shaft.
    Tightest,
}

/// How the rings give way: p = U / ( d (C_h/E_h + C_s/E_s) ).
///
/// C_h = (1 + Q²)/(1 − Q²) + ν_h, C_s = (1 + q²)/(1 − q²) − ν_s. Source: Lamé; Timoshenko & Goodier, *Theory of
/// Elasticity*, § 28.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Elasticity {
    /// C_h of the hub.
    pub hub_factor: f64,
    /// Young's modulus of the hub, Pa.
    pub hub_modulus: f64,
    /// C_s of the shaft.
    pub shaft_factor: f64,
    /// Young's modulus of the shaft, Pa.
    pub shaft_modulus: f64,
}

impl Elasticity {
    /// C_h/E_h + C_s/E_s, 1/Pa.
    #[inline]
    pub fn flexibility(&self) -> f64 {
        self.hub_factor / self.hub_modulus + self.shaft_factor / self.shaft_modulus
    }
}

/// One of the two parts.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Part {
    /// The inner one.
    Shaft,
    /// The outer one.
    Hub,
}

/// Where a least safety is found.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Place {
    /// Number of the service state; none is the shop.
    pub state: Option<usize>,
    /// The pair of parts.
    pub pair: PairKind,
}

/// A joint of two rings, prepared. SI throughout.
#[derive(Debug, Clone, PartialEq)]
pub struct PlainJoint {
    /// Joint diameter, m.
    pub diameter: f64,
    /// Length that carries, m.
    pub engaged_length: f64,
    /// How the rings give way at 20 °C; each condition has the moduli of its own temperatures.
    pub elasticity: Elasticity,
    /// Loss of interference by smoothing, m.
    pub smoothing_loss: f64,
    /// At which pairs it is taken.
    pub smoothing_at: SmoothingAt,
    /// Friction against slip, the low end.
    pub holding: f64,
    /// Friction while pressing.
    pub pressing: Range,
    /// Friction at release.
    pub release: Range,
    /// Half-angle of the lead-in chamfer, rad.
    pub chamfer_angle: f64,
    /// The shop: at rest, without load.
    pub shop: Condition,
    /// The service states.
    pub states: Vec<Condition>,
    /// The shaft.
    pub shaft: PlainRing,
    /// The hub.
    pub hub: PlainRing,
}

/// One pair of parts at the shop temperature, as in [`PairFindings`](crate::findings::PairFindings).
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PairValues {
    /// Interference as made, m.
    pub interference: f64,
    /// Loss by smoothing that was taken, m.
    pub smoothing: f64,
    /// Interference that grips, m.
    pub effective_interference: f64,
    /// Contact pressure, Pa.
    pub pressure: f64,
    /// The shaft.
    pub shaft: RingValues,
    /// The hub.
    pub hub: RingValues,
    /// Torque at slip, N·m.
    pub torque_capacity: f64,
    /// Axial force at slip, N.
    pub axial_capacity: f64,
    /// Greatest press-in force over the friction range, N.
    pub press_force: Range,
    /// Push-out force over the friction range, N.
    pub release_force: Range,
}

/// One pair in one service state, as in [`StateFindings`](crate::findings::StateFindings).
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct StateValues {
    /// Contact pressure, Pa.
    pub pressure: f64,
    /// Torque at slip, N·m.
    pub torque_capacity: f64,
    /// Axial force at slip, N.
    pub axial_capacity: f64,
    /// Safety against slip; none without load.
    pub slip_safety: Option<f64>,
    /// The shaft.
    pub shaft: RingValues,
    /// The hub.
    pub hub: RingValues,
}

impl StateValues {
    /// What is left for holding when of the contact pressure only this share counts; the stresses stay.
    #[must_use]
    pub fn relaxed(self, share: f64) -> Self {
        Self {
            pressure: share * self.pressure,
            torque_capacity: share * self.torque_capacity,
            axial_capacity: share * self.axial_capacity,
            slip_safety: self.slip_safety.map(|safety| share * safety),
            ..self
        }
    }
}

impl PlainJoint {
    /// A joint prepared for evaluation; its fit, if it has one, is not looked at.
    ///
    /// # Errors
    /// [`KernelError`] when the joint is not one of two rings, or a formula would leave its validity.
    ///
    /// # Example
    /// ```
    /// use std::path::Path;
    /// use hubgrip::joint::read;
    /// use hubgrip::material::library::Library;
    /// use hubgrip::population::kernel::{PairKind, PlainJoint};
    ///
    /// let text = "\
    /// joint_file: 1
    /// diameter: 60 mm
    /// length: 70 mm
    /// shaft: {material: C45+N}
    /// hub: {material: EN-GJL-250, outer_diameter: 110 mm}
    /// fit: H7/s6
    /// ";
    /// let joint = read::read(text, Path::new("joint.yaml"), &[], &Library::built_in()).unwrap();
    /// let plain = PlainJoint::of(&joint).unwrap();
    /// let tightest = plain.pair(72e-6, PairKind::Tightest).unwrap();
    /// let findings = hubgrip::findings::compute(joint).unwrap();
    /// let difference = tightest.pressure - findings.extremes.tightest.pressure;
    /// assert!(difference.abs() < 1e-12 * tightest.pressure);
    /// ```
    pub fn of(joint: &Joint) -> Result<Self, KernelError> {
        let [inner, outer] = joint.rings.as_slice() else {
            return Err(KernelError::NotTwoRings(joint.rings.len()));
        };
        if !joint.slices.is_empty() {
            return Err(KernelError::Stepped);
        }
        if joint.require.allow != Allow::Elastic {
            return Err(KernelError::MayYield);
        }
        let shaft = PlainRing::inner(inner, joint.criterion)?;
        let hub = PlainRing::outer(outer, joint.criterion)?;
        let elasticity = Elasticity {
            hub_factor: hub.bore_hoop + outer.material.poisson.value,
            hub_modulus: outer.material.youngs_modulus.value,
            // The rim of a shaft under unit pressure carries the hoop stress −(1 + q²)/(1 − q²).
            shaft_factor: -shaft.rim_hoop - inner.material.poisson.value,
            shaft_modulus: inner.material.youngs_modulus.value,
        };
        let conditions = Conditions { joint, inner, outer, elasticity };
        let states = joint.duty.iter().map(|state| conditions.of_state(state)).collect::<Result<_, _>>()?;
        Ok(Self {
            diameter: joint.diameter,
            engaged_length: joint.engaged_length(),
            elasticity,
            smoothing_loss: joint.smoothing.loss.first().copied().unwrap_or(0.0),
            smoothing_at: joint.smoothing.at,
            holding: joint.friction.holding.value.low,
            pressing: joint.friction.pressing.value,
            release: joint.friction.release.value,
            chamfer_angle: joint.assembly.chamfer_angle.value,
            shop: conditions.at_rest(joint.assembly.shop_temperature)?,
            states,
            shaft,
            hub,
        })
    }

    /// Interference (m) that is left to grip of the interference as made, by the kind of pair.
    #[inline]
    pub fn effective(&self, made: f64, kind: PairKind) -> f64 {
        if self.takes_loss(kind) { after_smoothing(made, self.smoothing_loss) } else { made }
    }

    /// Whether the smoothing loss is taken at this kind of pair.
    #[inline]
    pub fn takes_loss(&self, kind: PairKind) -> bool {
        match self.smoothing_at {
            SmoothingAt::Loosest => kind != PairKind::Tightest,
            SmoothingAt::Both => true,
            SmoothingAt::None => false,
        }
    }

    /// Contact pressure (Pa) of an interference that grips (m); zero when the parts do not touch.
    #[inline]
    pub fn pressure(&self, condition: &Condition, effective: f64) -> f64 {
        ((effective + condition.added_interference) * condition.pressure_per_interference).max(0.0)
    }

    /// Contact pressures (Pa) of interferences that grip (m); the two slices go together to the shorter end.
    #[inline]
    pub fn pressures(&self, condition: &Condition, effective: &[f64], pressures: &mut [f64]) {
        let (gain, added) = (condition.pressure_per_interference, condition.added_interference);
        for (pressure, effective) in pressures.iter_mut().zip(effective) {
            *pressure = ((effective + added) * gain).max(0.0);
        }
    }

    /// Interferences left to grip (m) of interferences as made, when the smoothing loss is taken.
    #[inline]
    pub fn smoothed(&self, made: &[f64], effective: &mut [f64]) {
        let loss = self.smoothing_loss;
        for (effective, made) in effective.iter_mut().zip(made) {
            // As `after_smoothing`, in a form without a branch: a clearance loses nothing.
            *effective = made.min((made - loss).max(0.0));
        }
    }

    /// Axial force at slip for each pascal of contact pressure and unit of friction, N/Pa: π d L.
    #[inline]
    pub fn area(&self) -> f64 {
        PI * self.diameter * self.engaged_length
    }

    /// One pair of parts at the shop temperature, at rest; `made` is its interference as made, m.
    ///
    /// # Errors
    /// A friction or a chamfer outside the validity of the press formulas.
    pub fn pair(&self, made: f64, kind: PairKind) -> Result<PairValues, KernelError> {
        let effective = self.effective(made, kind);
        let pressure = self.pressure(&self.shop, effective);
        let release = |friction| capacity::axial(friction, pressure, self.diameter, self.engaged_length);
        Ok(PairValues {
            interference: made,
            smoothing: made - effective,
            effective_interference: effective,
            pressure,
            shaft: self.shaft.values(pressure, &self.shop.shaft),
            hub: self.hub.values(pressure, &self.shop.hub),
            torque_capacity: self.torque_capacity(pressure),
            axial_capacity: self.axial_capacity(pressure),
            press_force: Range {
                low: self.press_force(pressure, effective, self.pressing.low)?,
                high: self.press_force(pressure, effective, self.pressing.high)?,
            },
            release_force: Range { low: release(self.release.low), high: release(self.release.high) },
        })
    }

    /// One pair in one condition, as on its first day; `effective` is the interference that grips, m.
    #[inline]
    pub fn state(&self, condition: &Condition, effective: f64) -> StateValues {
        let pressure = self.pressure(condition, effective);
        StateValues {
            pressure,
            torque_capacity: self.torque_capacity(pressure),
            axial_capacity: self.axial_capacity(pressure),
            slip_safety: condition.slip_safety_per_pressure.map(|gain| gain * pressure),
            shaft: self.shaft.values(pressure, &condition.shaft),
            hub: self.hub.values(pressure, &condition.hub),
        }
    }

    /// Contact pressure (Pa) that relaxation leaves for holding, of an interference that grips (m) at the loosest pair.
    #[inline]
    pub fn pressure_left(&self, condition: &Condition, effective: f64) -> f64 {
        condition.relaxation * self.pressure(condition, effective)
    }

    /// Greatest press-in force (N) at a contact pressure (Pa), interference that grips (m) and friction.
    ///
    /// The chamfer squeezes the overlap at the shop temperature: the interference with the difference of free growth.
    ///
    /// # Errors
    /// As [`press::peak_force`].
    pub fn press_force(&self, pressure: f64, effective: f64, friction: f64) -> Result<f64, KernelError> {
        let overlap = effective + self.shop.added_interference;
        Ok(press::peak_force(&PressInput {
            pressure: if overlap > 0.0 { pressure } else { 0.0 },
            interference: overlap.max(0.0),
            diameter: self.diameter,
            length: self.engaged_length,
            friction,
            chamfer_angle: self.chamfer_angle,
        })?)
    }

    /// Least safety against slip over the states that load the joint, with the number of its state; of the pressure
    /// counts what relaxation leaves.
    pub fn least_slip_safety(&self, effective: f64) -> Option<(f64, usize)> {
        let mut least: Option<(f64, usize)> = None;
        for (number, condition) in self.states.iter().enumerate() {
            if let Some(gain) = condition.slip_safety_per_pressure {
                let safety = gain * self.pressure_left(condition, effective);
                if least.is_none_or(|(found, _)| safety < found) {
                    least = Some((safety, number));
                }
            }
        }
        least
    }

    /// Least safety of a part over the shop and every state, at both pairs in a state, and where it is.
    ///
    /// The interferences that grip are those of the loosest and the tightest pair, m.
    pub fn least_safety(&self, part: Part, loosest: f64, tightest: f64) -> Option<(f64, Place)> {
        let safety = |condition: &Condition, effective: f64| {
            let pressure = self.pressure(condition, effective);
            match part {
                Part::Shaft => self.shaft.safety(pressure, &condition.shaft),
                Part::Hub => self.hub.safety(pressure, &condition.hub),
            }
        };
        let mut least: Option<(f64, Place)> = None;
        let mut take = |found: Option<f64>, state: Option<usize>, pair: PairKind| {
            if let Some(found) = found
                && least.is_none_or(|(least, _)| found < least)
            {
                least = Some((found, Place { state, pair }));
            }
        };
        take(safety(&self.shop, tightest), None, PairKind::Tightest);
        for (number, condition) in self.states.iter().enumerate() {
            take(safety(condition, tightest), Some(number), PairKind::Tightest);
            take(safety(condition, loosest), Some(number), PairKind::Loosest);
        }
        least
    }

    /// Contact pressure (Pa) at which the first part reaches its strength at rest, and which part that is.
    pub fn onset(&self) -> Option<(f64, Part)> {
        let shaft = self.shaft.pressure_at_strength().map(|pressure| (pressure, Part::Shaft));
        let hub = self.hub.pressure_at_strength().map(|pressure| (pressure, Part::Hub));
        match (shaft, hub) {
            (Some(shaft), Some(hub)) => Some(if hub.0 < shaft.0 { hub } else { shaft }),
            (shaft, hub) => shaft.or(hub),
        }
    }

    fn axial_capacity(&self, pressure: f64) -> f64 {
        capacity::axial(self.holding, pressure, self.diameter, self.engaged_length)
    }

    fn torque_capacity(&self, pressure: f64) -> f64 {
        capacity::torque(self.holding, pressure, self.diameter, self.engaged_length)
    }
}

/// Free thermal strain of a ring at a temperature (K).
fn strain(ring: &Ring, temperature: f64) -> Result<f64, KernelError> {
    let outside = |cause| KernelError::Expansion { material: ring.material.name.clone(), cause };
    ring.material.expansion.strain(temperature).map_err(outside)
}
