//! The population of a joint: what its file says, and what is taken where it is silent.

use thiserror::Error;

use super::ScatterError;
use super::model::{Arithmetic, Limit, Model, Population, State, Stiffness, Warm};
use crate::diagnostic::Diagnostic;
use crate::findings::failure;
use crate::joint::population::{Bounds, Variation};
use crate::joint::{DutyState, Joint, SmoothingAt};
use crate::material::{Kind as MaterialKind, Range};
use crate::population::distribution::{Distribution, DistributionError, Shape};
use crate::population::kernel::{Condition, KernelError, PlainJoint};
use crate::quantity::Kind;
use crate::tolerance::{Limits, Member};

/// Most different measured values of one quantity.
pub const MOST_VALUES: usize = 2000;

/// Why a joint has no population that can be evaluated.
#[derive(Debug, Clone, PartialEq, Error)]
pub enum PopulationError {
    /// The joint is not a plain joint of two rings.
    #[error(transparent)]
    Kernel(#[from] KernelError),
    /// A distribution makes no sense.
    #[error("population.{key}: {cause}")]
    Distribution {
        /// Key.
        key: &'static str,
        /// Why.
        cause: DistributionError,
    },
    /// A list of measurements cannot be read.
    #[error("{0}")]
    Measured(Box<Diagnostic>),
    /// A measured size that cannot be one of this joint.
    #[error(
        "population.{key}: {} of {file} is more than 5 % off the diameter of the joint, {}",
        crate::quantity::written(Kind::Length, *size),
        crate::quantity::written(Kind::Length, *nominal)
    )]
    OtherSize {
        /// Key.
        key: &'static str,
        /// The list.
        file: String,
        /// The size, m.
        size: f64,
        /// Diameter of the joint, m.
        nominal: f64,
    },
    /// More different values than are added up exactly.
    #[error(
        "population.{key}: {count} different measured values, at most {MOST_VALUES} are added up exactly"
    )]
    TooManyValues {
        /// Key.
        key: &'static str,
        /// How many.
        count: usize,
    },
    /// The formulas do not hold for all of it.
    #[error(transparent)]
    Scatter(#[from] ScatterError),
}

/// Reads the values of a list that the joint file names; of the kind of quantity.
pub type ReadList<'a> = dyn FnMut(&str, Kind) -> Result<Vec<f64>, Box<Diagnostic>> + 'a;

/// A model with what was assumed for it.
#[derive(Debug, Clone, PartialEq)]
pub struct Understood {
    /// The model.
    pub model: Model,
    /// What was taken where the file is silent, and what was cut; full sentences.
    pub assumed: Vec<String>,
}

/// The model of a joint.
///
/// # Errors
/// [`PopulationError`].
pub fn understood(joint: &Joint, read: &mut ReadList<'_>) -> Result<Understood, PopulationError> {
    let plain = PlainJoint::of(joint)?;
    let (inner, outer) = joint.shaft_and_hub();
    let mut taking = Taking { joint, read, assumed: Vec::new() };
    let plan = &joint.population;
    let population = Population {
        hole: taking.size("hole", plan.hole.as_ref(), Member::Hole)?,
        shaft: taking.size("shaft", plan.shaft.as_ref(), Member::Shaft)?,
        hub_roughness: taking.about(
            "hub_roughness",
            plan.hub_roughness.as_ref(),
            outer.roughness.value,
            Kind::Length,
            0.0,
        )?,
        shaft_roughness: taking.about(
            "shaft_roughness",
            plan.shaft_roughness.as_ref(),
            inner.roughness.value,
            Kind::Length,
            0.0,
        )?,
        friction: taking.friction("friction", plan.friction.as_ref(), joint.friction.holding.value)?,
        pressing: taking.friction(
            "pressing_friction",
            plan.pressing_friction.as_ref(),
            joint.friction.pressing.value,
        )?,
        hub_modulus: taking.about(
            "hub_youngs_modulus",
            plan.hub_youngs_modulus.as_ref(),
            outer.material.youngs_modulus.value,
            Kind::Pressure,
            0.01,
        )?,
        shaft_modulus: taking.about(
            "shaft_youngs_modulus",
            plan.shaft_youngs_modulus.as_ref(),
            inner.material.youngs_modulus.value,
            Kind::Pressure,
            0.01,
        )?,
        hub_temperature: taking.offset("hub_temperature", plan.hub_temperature.as_ref())?,
        shaft_temperature: taking.offset("shaft_temperature", plan.shaft_temperature.as_ref())?,
    };
    let mut assumed = taking.assumed;
    assumed.extend(joint.duty.iter().filter_map(relaxed));
    assumed.extend(joint.duty.iter().filter_map(at_mean_moduli));
    assumed.extend(joint.duty.iter().filter_map(left_out));
    let roughness = inner.roughness.value + outer.roughness.value;
    let factor = joint.smoothing.factor.unwrap_or(if roughness > 0.0 {
        plain.smoothing_loss / roughness
    } else {
        0.0
    });
    let stiffness = |condition: &Condition| Stiffness {
        hub: condition.hub_modulus / plain.elasticity.hub_modulus,
        shaft: condition.shaft_modulus / plain.elasticity.shaft_modulus,
    };
    let states = joint.duty.iter().zip(&plain.states).map(|(state, condition)| State {
        stiffness: stiffness(condition),
        name: state.name.clone(),
        force: condition.axial_force.hypot(2.0 * condition.torque / joint.diameter) / condition.relaxation,
        thermal: condition.added_interference,
        warm: match state.temperatures.as_slice() {
            [shaft, hub] => Some(Warm {
                shaft_temperature: *shaft,
                hub_temperature: *hub,
                shaft: inner.material.clone(),
                hub: outer.material.clone(),
                added: condition.added_interference - condition.thermal_interference,
            }),
            _ => None,
        },
    });
    let states_of_plain = &plain.states;
    let rings = [(inner, &plain.shaft), (outer, &plain.hub)].into_iter().filter_map(|(ring, plain)| {
        let required = match ring.material.kind {
            MaterialKind::Brittle => joint.require.fracture_safety,
            MaterialKind::Ductile | MaterialKind::Polymer => joint.require.yield_safety,
        };
        let (strength, pressure) = (plain.strength?, plain.pressure_at_strength()?);
        let in_state = |condition: &Condition| {
            let base = if std::ptr::eq(ring, inner) { &condition.shaft } else { &condition.hub };
            let at = |stress: f64| plain.pressure_at_stress(stress, base).unwrap_or(f64::INFINITY);
            [at(strength), at(strength / required)]
        };
        Some(Limit {
            name: ring.name.clone(),
            failure: failure(ring),
            pressure,
            required,
            in_states: states_of_plain.iter().map(in_state).collect(),
        })
    });
    let model = Model {
        population,
        smoothing_factor: factor,
        loss_when_holding: joint.smoothing.at != SmoothingAt::None,
        loss_under_stress: joint.smoothing.at == SmoothingAt::Both,
        diameter: joint.diameter,
        engaged_length: joint.engaged_length(),
        hub_factor: plain.elasticity.hub_factor,
        shaft_factor: plain.elasticity.shaft_factor,
        hub_stress: plain.hub.equivalent,
        chamfer_slope: plain.chamfer_angle.tan(),
        shop_thermal: plain.shop.thermal_interference,
        shop_stiffness: stiffness(&plain.shop),
        states: states.collect(),
        rings: rings.collect(),
        arithmetic: Arithmetic {
            interference: match joint.fits.first().map(|fit| fit.limits.interference()) {
                Some(extremes) => Range { low: extremes.loosest, high: extremes.tightest },
                None => Range { low: 0.0, high: 0.0 },
            },
            friction: joint.friction.holding.value,
            pressing: joint.friction.pressing.value,
        },
    };
    model.check()?;
    Ok(Understood { model, assumed })
}

/// Whether a size is so far off the nominal diameter that its unit or its list was mixed up: by 5 %, as for limits
/// (common practice, no source).
pub fn is_of_another_joint(size: f64, nominal: f64) -> bool {
    (size - nominal).abs() > 0.05 * nominal
}

/// That of a state's pressure only a share counts for holding.
fn relaxed(state: &DutyState) -> Option<String> {
    (state.relaxation < 1.0).then(|| {
        format!(
            "In state {} holding counts {:.0} % of the pressure of every pair, the share that relaxation leaves (joint file); the stresses stay those of the first day.",
            state.name,
            100.0 * state.relaxation
        )
    })
}

/// That what a state adds by itself does not follow the scatter of the moduli.
fn at_mean_moduli(state: &DutyState) -> Option<String> {
    let adds = state.speed != 0.0
        || state.inner_pressure != 0.0
        || state.outer_pressure != 0.0
        || !state.temperature_rises.is_empty();
    adds.then(|| {
        format!(
            "What speed, pressures from outside and heat flow in {} add to the interference and to the stresses is that at the mean moduli.",
            state.called()
        )
    })
}

/// What of a state the model has no place for.
fn left_out(state: &DutyState) -> Option<String> {
    let parts = [(state.bending_moment != 0.0 || state.radial_force != 0.0, "bending")];
    let named: Vec<&str> = parts.into_iter().filter_map(|(there, name)| there.then_some(name)).collect();
    (!named.is_empty()).then(|| {
        format!(
            "Of {} the {} does not count here: `hubgrip check` has its edge pressures at the extreme pairs.",
            state.called(),
            named.join(", ")
        )
    })
}

/// Limits of a member of the joint, m from the nominal diameter.
pub fn limits(joint: &Joint, member: Member) -> Limits {
    let fit = joint.fits.first().map(|fit| fit.limits);
    match (fit, member) {
        (Some(fit), Member::Hole) => fit.hole,
        (Some(fit), Member::Shaft) => fit.shaft,
        (None, _) => Limits { lower: 0.0, upper: 0.0 },
    }
}

struct Taking<'a, 'r> {
    joint: &'a Joint,
    read: &'a mut ReadList<'r>,
    assumed: Vec<String>,
}

impl Taking<'_, '_> {
    /// A size, as deviation from the nominal diameter.
    fn size(
        &mut self,
        key: &'static str,
        plan: Option<&Variation>,
        member: Member,
    ) -> Result<Distribution, PopulationError> {
        let nominal = self.joint.diameter;
        let limits = limits(self.joint, member);
        let refused = |cause| PopulationError::Distribution { key, cause };
        if limits.lower == limits.upper
            && matches!(plan, None | Some(Variation::Capable { .. } | Variation::Uniform(Bounds::Limits)))
        {
            return Distribution::fixed(limits.lower).map_err(refused);
        }
        let bounds = |bounds: Bounds| match bounds {
            Bounds::Limits => (limits.lower, limits.upper),
            Bounds::Given { low, high } => (low - nominal, high - nominal),
        };
        let cut_normal =
            |mean: f64, sd: f64, cut: (f64, f64)| Distribution::truncated_normal(mean, sd, cut.0, cut.1);
        match plan {
            None => {
                self.assumed.push(format!(
                    "population.{key} is silent: normal in the middle of its limits, which are 6 standard deviations apart (Cp 1; common practice, no source)."
                ));
                Distribution::capable(limits.lower, limits.upper, 1.0, 1.0, true)
            }
            Some(Variation::Fixed(value)) => Distribution::fixed(value - nominal),
            Some(Variation::Capable { cp, cpk, toward_upper, cut }) => {
                let least_material = member == Member::Hole;
                let upper = toward_upper.unwrap_or(least_material);
                if toward_upper.is_none() && cpk < cp {
                    self.assumed.push(format!(
                        "population.{key}.toward is silent: the mean has moved towards the {} limit, the least-material side, which is the safe side for holding.",
                        if upper { "upper" } else { "lower" }
                    ));
                }
                if *cpk < 0.0 {
                    self.assumed.push(format!(
                        "population.{key}.cpk is below zero: the mean of the parts lies outside the limits."
                    ));
                }
                let normal = Distribution::capable(limits.lower, limits.upper, *cp, *cpk, upper).map_err(refused)?;
                if *cut { cut_normal(normal.mean(), normal.sd(), (limits.lower, limits.upper)) } else { Ok(normal) }
            }
            Some(Variation::Normal { mean, sd, cut, skewness }) => {
                let mean = mean.map_or(limits.middle(), |mean| mean - nominal);
                match (cut, skewness) {
                    (Some(cut), _) => cut_normal(mean, *sd, bounds(*cut)),
                    (None, Some(skewness)) => Distribution::skewed(mean, *sd, *skewness),
                    (None, None) => Distribution::normal(mean, *sd),
                }
            }
            Some(Variation::Uniform(range)) => {
                let (low, high) = bounds(*range);
                Distribution::uniform(low, high)
            }
            Some(Variation::Measured(file)) => {
                return self.measured(key, file, Kind::Length).map(|sizes| sizes.shifted(-nominal));
            }
        }
        .map_err(refused)
    }

    fn measured(
        &mut self,
        key: &'static str,
        file: &str,
        kind: Kind,
    ) -> Result<Distribution, PopulationError> {
        let values = (self.read)(file, kind).map_err(PopulationError::Measured)?;
        let nominal = self.joint.diameter;
        if ["hole", "shaft"].contains(&key)
            && let Some(size) = values.iter().copied().find(|size| is_of_another_joint(*size, nominal))
        {
            return Err(PopulationError::OtherSize { key, file: file.to_owned(), size, nominal });
        }
        let distribution =
            Distribution::measured(&values).map_err(|cause| PopulationError::Distribution { key, cause })?;
        if let Shape::Measured(atoms) = distribution.shape()
            && atoms.len() > MOST_VALUES
        {
            return Err(PopulationError::TooManyValues { key, count: atoms.len() });
        }
        self.assumed.push(format!(
            "population.{key} rests on {} measured values, taken as they are: what happens to less than 1 in {} of them has not been seen.",
            values.len(),
            values.len()
        ));
        Ok(distribution)
    }

    /// A quantity about the joint's own value that cannot fall below `least` of its mean.
    fn about(
        &mut self,
        key: &'static str,
        plan: Option<&Variation>,
        own: f64,
        kind: Kind,
        least: f64,
    ) -> Result<Distribution, PopulationError> {
        let made = match plan {
            None => Distribution::fixed(own),
            Some(Variation::Fixed(value)) => Distribution::fixed(*value),
            Some(Variation::Normal { mean, sd, cut, skewness }) => {
                let mean = mean.unwrap_or(own);
                match (cut, skewness) {
                    (Some(Bounds::Given { low, high }), _) => {
                        Distribution::truncated_normal(mean, *sd, *low, *high)
                    }
                    (_, Some(skewness)) => Distribution::skewed(mean, *sd, *skewness),
                    _ => Distribution::normal(mean, *sd).and_then(|normal| {
                        let floor = least * mean;
                        if normal.support().0 > floor {
                            return Ok(normal);
                        }
                        self.assumed.push(format!(
                            "population.{key} is cut at {}: a normal of this width would fall below it.",
                            if least > 0.0 { "a hundredth of its mean" } else { "zero" }
                        ));
                        let ceiling = normal.support().1;
                        let ceiling = if kind == Kind::Number { ceiling.min(1.0) } else { ceiling };
                        Distribution::truncated_normal(mean, *sd, floor, ceiling)
                    }),
                }
            }
            Some(Variation::Uniform(Bounds::Given { low, high })) => Distribution::uniform(*low, *high),
            Some(Variation::Measured(file)) => return self.measured(key, file, kind),
            Some(Variation::Uniform(Bounds::Limits) | Variation::Capable { .. }) => {
                Err(DistributionError::NoValues)
            }
        };
        made.map_err(|cause| PopulationError::Distribution { key, cause })
    }

    fn friction(
        &mut self,
        key: &'static str,
        plan: Option<&Variation>,
        own: Range,
    ) -> Result<Distribution, PopulationError> {
        if plan.is_none() && own.low < own.high {
            self.assumed.push(format!(
                "population.{key} is silent: every value from {} to {}, the range of the joint, is taken to be alike (no source).",
                crate::quantity::number(own.low, 4),
                crate::quantity::number(own.high, 4)
            ));
            return Distribution::uniform(own.low, own.high)
                .map_err(|cause| PopulationError::Distribution { key, cause });
        }
        self.about(key, plan, 0.5 * (own.low + own.high), Kind::Number, 0.01)
    }

    /// A difference of temperature, zero when silent.
    fn offset(
        &mut self,
        key: &'static str,
        plan: Option<&Variation>,
    ) -> Result<Distribution, PopulationError> {
        let refused = |cause| PopulationError::Distribution { key, cause };
        match plan {
            Some(Variation::Normal { mean, sd, cut: None, skewness: None }) => {
                Distribution::normal(mean.unwrap_or(0.0), *sd).map_err(refused)
            }
            _ => self.about(key, plan, 0.0, Kind::TemperatureDifference, 0.0),
        }
    }
}
