//! What a population of parts does: how interference, pressure, stress and capacity scatter, how often a joint
//! slips or yields.
//!
//! Two engines evaluate the one [`model`]: [`analysis`] by integration, [`simulation`] by random pairs. Each
//! probability carries both, and whether they agree.

pub mod analysis;
pub mod model;
pub mod shares;
pub mod simulation;
pub mod understood;

use thiserror::Error;

use self::analysis::Analysis;
use self::model::Model;
use self::shares::Share;
use self::simulation::Simulation;
use crate::numerics::root::RootError;
use crate::population::distribution::DistributionError;
use crate::population::monte_carlo::estimate::Estimate;

/// Shares of the population at which percentiles are told; the outermost are those of ±3 standard deviations.
pub const LEVELS: [f64; 7] = [0.001_35, 0.01, 0.05, 0.5, 0.95, 0.99, 0.998_65];

/// Classes of a plotted histogram.
const PLOT_CLASSES: usize = 60;

/// Points of a plotted curve of shares.
const CURVE_POINTS: usize = 61;

/// Least share that a plotted curve goes down to.
const LEAST_SHARE: f64 = 1e-12;

/// What scatters as a result.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub enum Quantity {
    /// Interference as made, m.
    Interference,
    /// Interference that grips, m; the loss by smoothing is taken where the joint file says.
    EffectiveInterference,
    /// Contact pressure in the shop, Pa.
    Pressure,
    /// Equivalent stress of the hub in the shop, Pa.
    HubStress,
    /// Torque capacity in the shop, N·m.
    TorqueCapacity,
    /// Greatest press-in force, N.
    PressForce,
}

impl Quantity {
    /// All of them, in the order of the results.
    pub const ALL: [Self; 6] = [
        Self::Interference,
        Self::EffectiveInterference,
        Self::Pressure,
        Self::HubStress,
        Self::TorqueCapacity,
        Self::PressForce,
    ];

    /// Its name.
    pub fn name(self) -> &'static str {
        match self {
            Self::Interference => "interference",
            Self::EffectiveInterference => "effective interference",
            Self::Pressure => "contact pressure",
            Self::HubStress => "hub stress",
            Self::TorqueCapacity => "torque capacity",
            Self::PressForce => "press force",
        }
    }
}

/// Why a population cannot be evaluated.
#[derive(Debug, Clone, PartialEq, Error)]
pub enum ScatterError {
    /// A distribution was refused.
    #[error(transparent)]
    Distribution(#[from] DistributionError),
    /// No root where there must be one.
    #[error(transparent)]
    Root(#[from] RootError),
    /// A quantity that must stay above zero may reach it.
    #[error("the {what} may fall to zero or below: its distribution reaches nine standard deviations out")]
    ReachesZero {
        /// Key of the population.
        what: &'static str,
    },
    /// A coefficient of friction may exceed 1.
    #[error("the {what} may exceed 1")]
    FrictionAboveOne {
        /// Key of the population.
        what: &'static str,
    },
    /// Two measured lists have more different interferences than can be added to a scattering loss.
    #[error(
        "the measured holes and shafts have {count} different interferences: at most {most} can be added to a roughness that scatters"
    )]
    TooManyValues {
        /// How many.
        count: usize,
        /// How many at most.
        most: usize,
    },
    /// A length or factor of the joint is not positive.
    #[error("a length or factor of the joint is {given}, it must be more than zero")]
    Geometry {
        /// The value.
        given: f64,
    },
    /// A temperature may leave the expansion curve of a material.
    #[error("in state {state} the temperature of {material} may leave its expansion curve")]
    Temperature {
        /// State.
        state: String,
        /// Material.
        material: String,
    },
    /// A material that shrinks when heated within the temperatures of a state.
    #[error("in state {state} a part does not grow steadily with its temperature")]
    NotMonotone {
        /// State.
        state: String,
    },
    /// No samples, or too many.
    #[error("{given} samples were asked for: 1 to 10000000000 can be drawn")]
    Samples {
        /// What was asked for.
        given: u64,
    },
}

/// How many random pairs, from which seed, judged by which safety.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Settings {
    /// Random pairs.
    pub samples: u64,
    /// Seed.
    pub seed: u64,
    /// Slip safety that is required.
    pub slip_safety: f64,
}

/// What a population does.
#[derive(Debug, Clone, PartialEq)]
pub struct Scatter {
    /// The model that was evaluated.
    pub model: Model,
    /// What was asked for.
    pub settings: Settings,
    /// Each quantity.
    pub quantities: Vec<Spread>,
    /// Slip in each state that loads the joint.
    pub slips: Vec<Event>,
    /// Each ring in the condition where it most often gives way.
    pub failures: Vec<Event>,
    /// Which tolerance matters most.
    pub shares: Vec<Share>,
}

/// How a quantity scatters, by both engines.
#[derive(Debug, Clone, PartialEq)]
pub struct Spread {
    /// Which quantity.
    pub quantity: Quantity,
    /// Mean and standard deviation by integration.
    pub moments: (f64, f64),
    /// Mean and standard deviation of the samples.
    pub sampled_moments: (f64, f64),
    /// Standard error of the sampled mean.
    pub standard_error: f64,
    /// Share, percentile by integration, percentile of the samples.
    pub percentiles: Vec<(f64, f64, f64)>,
    /// Classes of the samples: lower end, upper end, share; empty unless plotted.
    pub classes: Vec<(f64, f64, f64)>,
    /// Value, share below, share above by integration; empty unless plotted.
    pub curve: Vec<(f64, f64, f64)>,
}

/// Something that must not happen, with its probability by both engines.
#[derive(Debug, Clone, PartialEq)]
pub struct Event {
    /// What happens: `slip`, `yield of the hub`.
    pub what: String,
    /// In which state.
    pub at: String,
    /// Probability by integration.
    pub probability: f64,
    /// Counted.
    pub counted: Estimate,
    /// Probability that the safety is below the one required, by integration.
    pub below_required: f64,
    /// Counted.
    pub counted_below_required: Estimate,
    /// The safety that is required.
    pub required: f64,
}

impl Event {
    /// Whether both engines agree.
    pub fn agrees(&self) -> bool {
        self.counted.agrees_with(self.probability)
            && self.counted_below_required.agrees_with(self.below_required)
    }
}

/// Evaluates a population with both engines.
///
/// # Errors
/// [`ScatterError`] when a quantity may leave the validity of the formulas.
pub fn scatter(model: Model, settings: Settings) -> Result<Scatter, ScatterError> {
    if settings.samples == 0 || settings.samples > crate::population::monte_carlo::MOST_SAMPLES {
        return Err(ScatterError::Samples { given: settings.samples });
    }
    let analysis = Analysis::of(&model)?;
    let simulation =
        Simulation::run(&model, settings.slip_safety, settings.samples, settings.seed, |quantity| {
            analysis.support(quantity)
        });
    let quantities = Quantity::ALL
        .into_iter()
        .map(|quantity| spread(&analysis, &simulation, quantity))
        .collect::<Result<Vec<_>, _>>()?;
    let slips = slips(&model, &analysis, &simulation, settings.slip_safety);
    let failures = failures(&model, &analysis, &simulation);
    let shares = shares::shares(&model);
    Ok(Scatter { settings, quantities, slips, failures, shares, model })
}

fn spread(
    analysis: &Analysis<'_>,
    simulation: &Simulation,
    quantity: Quantity,
) -> Result<Spread, ScatterError> {
    let percentiles = LEVELS
        .into_iter()
        .map(|level| Ok((level, analysis.quantile(quantity, level)?, simulation.quantile(quantity, level))))
        .collect::<Result<Vec<_>, ScatterError>>()?;
    let sampled_moments = simulation.moments(quantity);
    let plotted = matches!(quantity, Quantity::Interference | Quantity::TorqueCapacity);
    let (classes, curve) = if plotted {
        let (low, high) = analysis.support(quantity);
        let inside = |level: f64, fall: f64| analysis.quantile(quantity, level).unwrap_or(fall);
        let (from, to) = (inside(1e-5, low), inside(1.0 - 1e-5, high));
        let classes = simulation.classes(quantity, from, to, PLOT_CLASSES);
        (classes, curve(analysis, quantity))
    } else {
        (Vec::new(), Vec::new())
    };
    Ok(Spread {
        quantity,
        moments: analysis.moments(quantity),
        sampled_moments,
        standard_error: sampled_moments.1 / (simulation.samples as f64).sqrt(),
        percentiles,
        classes,
        curve,
    })
}

/// Shares below and above over the range in which the smaller is at least [`LEAST_SHARE`].
fn curve(analysis: &Analysis<'_>, quantity: Quantity) -> Vec<(f64, f64, f64)> {
    let (low, high) = analysis.support(quantity);
    let (from, to) = (
        analysis.quantile(quantity, LEAST_SHARE).unwrap_or(low),
        analysis.quantile(quantity, 1.0 - LEAST_SHARE).unwrap_or(high),
    );
    (0..CURVE_POINTS)
        .map(|i| from + (to - from) * i as f64 / (CURVE_POINTS - 1) as f64)
        .map(|x| (x, analysis.below(quantity, x), analysis.above(quantity, x)))
        .collect()
}

fn slips(model: &Model, analysis: &Analysis<'_>, simulation: &Simulation, required: f64) -> Vec<Event> {
    model
        .states
        .iter()
        .zip(&simulation.slips)
        .enumerate()
        .filter(|(_, (state, _))| state.force > 0.0)
        .map(|(number, (state, counted))| Event {
            what: "slip".to_owned(),
            at: state.name.clone(),
            probability: analysis.slip(number, 1.0),
            counted: counted[0],
            below_required: analysis.slip(number, required),
            counted_below_required: counted[1],
            required,
        })
        .collect()
}

fn failures(model: &Model, analysis: &Analysis<'_>, simulation: &Simulation) -> Vec<Event> {
    let mut events = Vec::new();
    for (ring, counted) in model.rings.iter().zip(&simulation.failures) {
        let mut worst: Option<Event> = None;
        for (condition, counted) in counted.iter().enumerate() {
            let [limit, wanted] = ring.in_condition(condition);
            let probability = analysis.exceeds(condition, limit);
            let below_required = analysis.exceeds(condition, wanted);
            let higher = worst.as_ref().is_none_or(|worst| {
                (probability, below_required) > (worst.probability, worst.below_required)
            });
            if higher {
                worst = Some(Event {
                    what: format!("{} of the {}", ring.failure, ring.name),
                    at: model.condition_name(condition).to_owned(),
                    probability,
                    counted: counted[0],
                    below_required,
                    counted_below_required: counted[1],
                    required: ring.required,
                });
            }
        }
        events.extend(worst);
    }
    events
}
