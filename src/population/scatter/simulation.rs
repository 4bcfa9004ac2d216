//! The population by random pairs: blocks of samples through loops that the compiler can vectorise.

use std::f64::consts::PI;

use rand_xoshiro::Xoshiro256PlusPlus;

use super::Quantity;
use super::model::{Model, State};
use crate::population::monte_carlo::estimate::Estimate;
use crate::population::monte_carlo::histogram::Histogram;
use crate::population::monte_carlo::sampler::Sampler;
use crate::population::monte_carlo::{self, BLOCK};

/// Everything that was counted.
#[derive(Debug, Clone, PartialEq)]
pub struct Simulation {
    /// Number of samples.
    pub samples: u64,
    /// Seed.
    pub seed: u64,
    /// Slips of each state: under its load, under its load times the safety required.
    pub slips: Vec<[Estimate; 2]>,
    /// Of each ring in each condition: gives way, has less than the safety required.
    pub failures: Vec<Vec<[Estimate; 2]>>,
    spread: Spread,
}

/// Counts of the quantities.
#[derive(Debug, Clone, PartialEq)]
struct Spread {
    made: Histogram,
    torque: Histogram,
    force: Histogram,
    /// Effective interference, pressure, hub stress, when they do not follow from the interference alone.
    own: Option<[Histogram; 3]>,
    /// How they follow when they do.
    fixed: Option<Follow>,
}

/// Loss and compliance that do not scatter: then grip, pressure and stress follow from the interference.
#[derive(Debug, Clone, Copy, PartialEq)]
struct Follow {
    loss: f64,
    holds: bool,
    stresses: bool,
    thermal: f64,
    compliance: f64,
    hub_stress: f64,
}

impl Follow {
    fn value(&self, quantity: Quantity, made: f64) -> f64 {
        let grip = |taken: bool| if taken { made.min((made - self.loss).max(0.0)) } else { made };
        let pressure = |taken: bool| (grip(taken) + self.thermal).max(0.0) / self.compliance;
        match quantity {
            Quantity::EffectiveInterference => grip(self.holds),
            Quantity::Pressure => pressure(self.holds),
            Quantity::HubStress => pressure(self.stresses) * self.hub_stress,
            _ => made,
        }
    }
}

impl Simulation {
    /// Draws `samples` pairs; `range` gives least and greatest value of a quantity.
    ///
    /// `safeties` is the slip safety that is required.
    pub fn run(
        model: &Model,
        slip_safety: f64,
        samples: u64,
        seed: u64,
        range: impl Fn(Quantity) -> (f64, f64),
    ) -> Self {
        let plan = Plan::of(model, slip_safety, range);
        let tally = monte_carlo::run(
            seed,
            samples,
            || Tally::empty(&plan),
            |tally, generator, size| {
                let mut block = Block::of(&plan);
                let mut left = size;
                while left > 0 {
                    let count = left.min(BLOCK as u64) as usize;
                    block.draw(&plan, generator, count);
                    block.count(&plan, tally, count);
                    left -= count as u64;
                }
            },
            Tally::add,
        );
        tally.told(&plan, seed, samples)
    }

    /// Value with a share `level` of the samples below it.
    pub fn quantile(&self, quantity: Quantity, level: f64) -> f64 {
        match (self.spread.fixed, self.histogram(quantity)) {
            (_, Some(histogram)) => histogram.quantile(level),
            (Some(follow), None) => follow.value(quantity, self.spread.made.quantile(level)),
            (None, None) => self.spread.made.quantile(level),
        }
    }

    /// Mean and standard deviation of the samples.
    pub fn moments(&self, quantity: Quantity) -> (f64, f64) {
        match (self.spread.fixed, self.histogram(quantity)) {
            (_, Some(histogram)) => histogram.moments(|x| x),
            (Some(follow), None) => self.spread.made.moments(|made| follow.value(quantity, made)),
            (None, None) => self.spread.made.moments(|x| x),
        }
    }

    /// Classes for a plot: lower end, upper end, share.
    pub fn classes(&self, quantity: Quantity, from: f64, to: f64, groups: usize) -> Vec<(f64, f64, f64)> {
        self.histogram(quantity).map(|histogram| histogram.coarse(from, to, groups)).unwrap_or_default()
    }

    fn histogram(&self, quantity: Quantity) -> Option<&Histogram> {
        let spread = &self.spread;
        let own = |index: usize| spread.own.as_ref().map(|own| &own[index]);
        match quantity {
            Quantity::Interference => Some(&spread.made),
            Quantity::EffectiveInterference => own(0),
            Quantity::Pressure => own(1),
            Quantity::HubStress => own(2),
            Quantity::TorqueCapacity => Some(&spread.torque),
            Quantity::PressForce => Some(&spread.force),
        }
    }
}

/// What is the same for every block.
struct Plan<'a> {
    model: &'a Model,
    hole: Sampler,
    shaft: Sampler,
    hub_roughness: Sampler,
    shaft_roughness: Sampler,
    friction: Sampler,
    pressing: Sampler,
    hub_modulus: Sampler,
    shaft_modulus: Sampler,
    hub_temperature: Sampler,
    shaft_temperature: Sampler,
    loss_scatters: bool,
    compliance_scatters: bool,
    temperature_scatters: bool,
    slip_safety: f64,
    spread: Spread,
}

impl<'a> Plan<'a> {
    fn of(model: &'a Model, slip_safety: f64, range: impl Fn(Quantity) -> (f64, f64)) -> Self {
        let population = &model.population;
        let histogram = |quantity: Quantity| {
            let (low, high) = range(quantity);
            Histogram::new(low, high)
        };
        let (hub_roughness, shaft_roughness) =
            (Sampler::of(&population.hub_roughness), Sampler::of(&population.shaft_roughness));
        let (hub_modulus, shaft_modulus) =
            (Sampler::of(&population.hub_modulus), Sampler::of(&population.shaft_modulus));
        let loss_scatters = !(hub_roughness.is_fixed() && shaft_roughness.is_fixed());
        let compliance_scatters = !(hub_modulus.is_fixed() && shaft_modulus.is_fixed());
        let follows = !loss_scatters && !compliance_scatters;
        let follow = Follow {
            loss: model.smoothing_factor
                * (population.hub_roughness.mean() + population.shaft_roughness.mean()),
            holds: model.loss_when_holding,
            stresses: model.loss_under_stress,
            thermal: model.shop_thermal,
            compliance: model.compliance(population.hub_modulus.mean(), population.shaft_modulus.mean()),
            hub_stress: model.hub_stress,
        };
        let own = [Quantity::EffectiveInterference, Quantity::Pressure, Quantity::HubStress].map(&histogram);
        Self {
            model,
            hole: Sampler::of(&population.hole),
            shaft: Sampler::of(&population.shaft),
            hub_roughness,
            shaft_roughness,
            friction: Sampler::of(&population.friction),
            pressing: Sampler::of(&population.pressing),
            hub_modulus,
            shaft_modulus,
            hub_temperature: Sampler::of(&population.hub_temperature),
            shaft_temperature: Sampler::of(&population.shaft_temperature),
            loss_scatters,
            compliance_scatters,
            temperature_scatters: model.scatters_in_temperature(),
            slip_safety,
            spread: Spread {
                made: histogram(Quantity::Interference),
                torque: histogram(Quantity::TorqueCapacity),
                force: histogram(Quantity::PressForce),
                own: (!follows).then_some(own),
                fixed: follows.then_some(follow),
            },
        }
    }
}

impl Plan<'_> {
    /// How much stiffer a condition is than the shop where the moduli do not scatter; one where they do, and the stiffness
    /// is worked out pair by pair.
    fn stiffer(&self, condition: usize) -> f64 {
        let model = self.model;
        let stiffness = model.stiffness(condition);
        if self.compliance_scatters || stiffness == model.shop_stiffness {
            return 1.0;
        }
        let (hub, shaft) = (model.population.hub_modulus.mean(), model.population.shaft_modulus.mean());
        model.compliance(hub, shaft) / model.compliance_with(stiffness, hub, shaft)
    }

    /// Whether every pair presses in a condition as in the shop.
    fn is_as_the_shop(&self, condition: usize) -> bool {
        !self.temperature_scatters
            && self.model.thermal(condition) == self.model.shop_thermal
            && self.model.stiffness(condition) == self.model.shop_stiffness
    }

    /// An earlier condition with the same pressures and limits.
    fn earlier(&self, condition: usize) -> Option<usize> {
        if self.temperature_scatters {
            return None;
        }
        let thermal = self.model.thermal(condition);
        let stiffness = self.model.stiffness(condition);
        (0..condition).find(|earlier| {
            self.model.thermal(*earlier) == thermal
                && self.model.stiffness(*earlier) == stiffness
                && self
                    .model
                    .rings
                    .iter()
                    .all(|ring| ring.in_condition(*earlier) == ring.in_condition(condition))
        })
    }
}

/// Samples that go through the formulas together.
struct Block {
    made: Vec<f64>,
    loss: Vec<f64>,
    friction: Vec<f64>,
    pressing: Vec<f64>,
    hub_modulus: Vec<f64>,
    shaft_modulus: Vec<f64>,
    /// 1/C at the shop temperature, Pa/m.
    stiffness: Vec<f64>,
    /// 1/C and μ/C in a state with other moduli, where these scatter.
    warm_stiffness: Vec<f64>,
    warm_gain: Vec<f64>,
    warm_hub: Vec<f64>,
    warm_shaft: Vec<f64>,
    hold: Vec<f64>,
    stress: Vec<f64>,
    /// μ/C.
    gain: Vec<f64>,
    scratch: Vec<f64>,
    other: Vec<f64>,
}

impl Block {
    fn of(plan: &Plan<'_>) -> Self {
        let population = &plan.model.population;
        let zeros = || vec![0.0; BLOCK];
        let compliance =
            plan.model.compliance(population.hub_modulus.mean(), population.shaft_modulus.mean());
        let roughness = population.hub_roughness.mean() + population.shaft_roughness.mean();
        Self {
            made: zeros(),
            loss: vec![plan.model.smoothing_factor * roughness; BLOCK],
            friction: vec![population.friction.mean(); BLOCK],
            pressing: vec![population.pressing.mean(); BLOCK],
            hub_modulus: zeros(),
            shaft_modulus: zeros(),
            stiffness: vec![1.0 / compliance; BLOCK],
            warm_stiffness: zeros(),
            warm_gain: zeros(),
            warm_hub: zeros(),
            warm_shaft: zeros(),
            hold: zeros(),
            stress: zeros(),
            gain: zeros(),
            scratch: zeros(),
            other: zeros(),
        }
    }

    fn draw(&mut self, plan: &Plan<'_>, generator: &mut Xoshiro256PlusPlus, count: usize) {
        let model = plan.model;
        let (scratch, other) = (&mut self.scratch[..count], &mut self.other[..count]);
        plan.shaft.fill(generator, &mut self.made[..count]);
        plan.hole.fill(generator, scratch);
        for (made, hole) in self.made.iter_mut().zip(scratch.iter()) {
            *made -= *hole;
        }
        if !plan.friction.is_fixed() {
            plan.friction.fill(generator, &mut self.friction[..count]);
        }
        if !plan.pressing.is_fixed() {
            plan.pressing.fill(generator, &mut self.pressing[..count]);
        }
        if plan.loss_scatters {
            plan.hub_roughness.fill(generator, scratch);
            plan.shaft_roughness.fill(generator, other);
            for ((loss, hub), shaft) in self.loss.iter_mut().zip(scratch.iter()).zip(other.iter()) {
                *loss = model.smoothing_factor * (hub + shaft);
            }
        }
        if plan.compliance_scatters {
            let (hubs, shafts) = (&mut self.hub_modulus[..count], &mut self.shaft_modulus[..count]);
            plan.hub_modulus.fill(generator, hubs);
            plan.shaft_modulus.fill(generator, shafts);
            for ((stiffness, hub), shaft) in self.stiffness.iter_mut().zip(hubs.iter()).zip(shafts.iter()) {
                *stiffness = 1.0 / model.compliance(*hub, *shaft);
            }
        }
        if plan.temperature_scatters {
            plan.hub_temperature.fill(generator, &mut self.warm_hub[..count]);
            plan.shaft_temperature.fill(generator, &mut self.warm_shaft[..count]);
        }
        let grips = |grips: &mut [f64], taken: bool| {
            if !taken {
                grips.copy_from_slice(&self.made);
                return;
            }
            for ((grip, made), loss) in grips.iter_mut().zip(&self.made).zip(&self.loss) {
                *grip = lesser(*made, open(made - loss));
            }
        };
        grips(&mut self.hold, model.loss_when_holding);
        if model.loss_under_stress == model.loss_when_holding {
            self.stress.copy_from_slice(&self.hold);
        } else {
            grips(&mut self.stress, model.loss_under_stress);
        }
        for ((gain, friction), stiffness) in self.gain.iter_mut().zip(&self.friction).zip(&self.stiffness) {
            *gain = friction * stiffness;
        }
    }

    fn count(&mut self, plan: &Plan<'_>, tally: &mut Tally, count: usize) {
        let model = plan.model;
        tally.spread.made.count(&self.made[..count]);
        let thermal = model.shop_thermal;
        let factor = model.area() * model.arm();
        for ((torque, grip), gain) in self.scratch.iter_mut().zip(&self.hold).zip(&self.gain) {
            *torque = factor * gain * open(grip + thermal);
        }
        tally.spread.torque.count(&self.scratch[..count]);
        // Where a state is as the shop, these are its torques at slip too.
        for (number, state) in model.states.iter().enumerate() {
            if state.force > 0.0
                && plan.is_as_the_shop(number + 1)
                && let Some(slips) = tally.slips.get_mut(number)
            {
                let needed = state.force * model.arm();
                let torques = &self.scratch[..count];
                let found =
                    counts(torques, |torque| torque < needed, |torque| torque < plan.slip_safety * needed);
                slips[0] += found[0];
                slips[1] += found[1];
            }
        }
        self.press_forces(model);
        tally.spread.force.count(&self.scratch[..count]);
        if let Some([effective, pressure, stress]) = &mut tally.spread.own {
            effective.count(&self.hold[..count]);
            for ((value, grip), stiffness) in self.scratch.iter_mut().zip(&self.hold).zip(&self.stiffness) {
                *value = stiffness * open(grip + thermal);
            }
            pressure.count(&self.scratch[..count]);
            for ((value, grip), stiffness) in self.scratch.iter_mut().zip(&self.stress).zip(&self.stiffness) {
                *value = model.hub_stress * stiffness * open(grip + thermal);
            }
            stress.count(&self.scratch[..count]);
        }
        self.events(plan, tally, count);
    }

    /// Fills the stiffness of a condition pair by pair; false where that of the shop, times a number, is its own.
    fn warm(&mut self, plan: &Plan<'_>, condition: usize) -> bool {
        let model = plan.model;
        let stiffness = model.stiffness(condition);
        if !plan.compliance_scatters || stiffness == model.shop_stiffness {
            return false;
        }
        let moduli = self.hub_modulus.iter().zip(&self.shaft_modulus);
        for ((own, gain), ((hub, shaft), friction)) in
            self.warm_stiffness.iter_mut().zip(&mut self.warm_gain).zip(moduli.zip(&self.friction))
        {
            *own = 1.0 / model.compliance_with(stiffness, *hub, *shaft);
            *gain = friction * *own;
        }
        true
    }

    fn press_forces(&mut self, model: &Model) {
        let thermal = model.shop_thermal;
        let round = PI * model.diameter;
        for (((force, grip), stiffness), friction) in
            self.scratch.iter_mut().zip(&self.stress).zip(&self.stiffness).zip(&self.pressing)
        {
            let overlap = open(grip + thermal);
            let along = friction * model.engaged_length + overlap * model.chamfer_factor(*friction);
            *force = round * stiffness * overlap * along;
        }
    }

    fn events(&mut self, plan: &Plan<'_>, tally: &mut Tally, count: usize) {
        let model = plan.model;
        for condition in 0..model.conditions() {
            let number = condition.checked_sub(1);
            let state = number.and_then(|number| model.states.get(number));
            let warm = state.and_then(|state| state.warm.as_ref()).filter(|_| plan.temperature_scatters);
            let fixed = model.thermal(condition);
            let stiffer = plan.stiffer(condition);
            let own = self.warm(plan, condition);
            let (gains, stiffness) =
                if own { (&self.warm_gain, &self.warm_stiffness) } else { (&self.gain, &self.stiffness) };
            if let Some(warm) = warm {
                for ((thermal, shaft), hub) in self.other.iter_mut().zip(&self.warm_shaft).zip(&self.warm_hub)
                {
                    *thermal = warm.thermal(model.diameter, *shaft, *hub);
                }
            }
            if let Some(State { force, .. }) = state
                && *force > 0.0
                && !plan.is_as_the_shop(condition)
                && let Some(slips) = number.and_then(|number| tally.slips.get_mut(number))
            {
                let held =
                    held(&mut self.scratch, &self.hold, gains, &self.other, warm.is_none().then_some(fixed));
                // A stiffer state needs less of the shop's pressure.
                let needed = force / model.area() / stiffer;
                let found =
                    counts(&held[..count], |held| held < needed, |held| held < plan.slip_safety * needed);
                slips[0] += found[0];
                slips[1] += found[1];
            }
            if warm.is_none() && plan.earlier(condition).is_some() {
                continue;
            }
            let pressures = held(
                &mut self.scratch,
                &self.stress,
                stiffness,
                &self.other,
                warm.is_none().then_some(fixed),
            );
            let pressures = &pressures[..count];
            let highest = greatest(pressures);
            for (ring, failures) in model.rings.iter().zip(&mut tally.failures) {
                let Some(failures) = failures.get_mut(condition) else { continue };
                let [limit, wanted] = ring.in_condition(condition).map(|limit| limit / stiffer);
                if highest > limit.min(wanted) {
                    let found = counts(pressures, |p| p > limit, |p| p > wanted);
                    failures[0] += found[0];
                    failures[1] += found[1];
                }
            }
        }
    }
}

/// Gain times the grip with the thermal interference, zero when the pair is open; the thermal interference is one
/// for all, or one for each.
fn held<'s>(
    into: &'s mut [f64],
    grips: &[f64],
    gains: &[f64],
    thermals: &[f64],
    fixed: Option<f64>,
) -> &'s [f64] {
    match fixed {
        Some(thermal) => {
            for ((held, grip), gain) in into.iter_mut().zip(grips).zip(gains) {
                *held = gain * open(grip + thermal);
            }
        }
        None => {
            for (((held, grip), gain), thermal) in into.iter_mut().zip(grips).zip(gains).zip(thermals) {
                *held = gain * open(grip + thermal);
            }
        }
    }
    into
}

/// The value, zero when it is negative: one instruction, where `max` minds NaN.
#[inline]
fn open(value: f64) -> f64 {
    if value > 0.0 { value } else { 0.0 }
}

/// The lesser of two, likewise.
#[inline]
fn lesser(one: f64, other: f64) -> f64 {
    if one < other { one } else { other }
}

/// The greatest value, at least zero, in lanes that the compiler keeps in one register.
fn greatest(values: &[f64]) -> f64 {
    let mut lanes = [0.0f64; 8];
    let parts = values.chunks_exact(lanes.len());
    let rest = parts.remainder().iter().copied().fold(0.0, f64::max);
    for part in parts {
        for (lane, value) in lanes.iter_mut().zip(part) {
            *lane = if *value > *lane { *value } else { *lane };
        }
    }
    lanes.into_iter().fold(rest, f64::max)
}

/// How many values meet each of two conditions.
fn counts(values: &[f64], one: impl Fn(f64) -> bool, other: impl Fn(f64) -> bool) -> [u64; 2] {
    let mut found = [0u64; 2];
    for value in values {
        found[0] += u64::from(one(*value));
        found[1] += u64::from(other(*value));
    }
    found
}

/// Counts of some chunks.
struct Tally {
    slips: Vec<[u64; 2]>,
    failures: Vec<Vec<[u64; 2]>>,
    spread: Spread,
}

impl Tally {
    fn empty(plan: &Plan<'_>) -> Self {
        let model = plan.model;
        Self {
            slips: vec![[0; 2]; model.states.len()],
            failures: vec![vec![[0; 2]; model.conditions()]; model.rings.len()],
            spread: plan.spread.clone(),
        }
    }

    fn add(mut self, other: Self) -> Self {
        let add = |counts: &mut [u64; 2], more: &[u64; 2]| {
            counts[0] += more[0];
            counts[1] += more[1];
        };
        for (counts, more) in self.slips.iter_mut().zip(&other.slips) {
            add(counts, more);
        }
        for (ring, more) in self.failures.iter_mut().zip(&other.failures) {
            for (counts, more) in ring.iter_mut().zip(more) {
                add(counts, more);
            }
        }
        self.spread.made.add(&other.spread.made);
        self.spread.torque.add(&other.spread.torque);
        self.spread.force.add(&other.spread.force);
        if let (Some(own), Some(more)) = (&mut self.spread.own, &other.spread.own) {
            for (histogram, more) in own.iter_mut().zip(more) {
                histogram.add(more);
            }
        }
        self
    }

    fn told(mut self, plan: &Plan<'_>, seed: u64, samples: u64) -> Simulation {
        for failures in &mut self.failures {
            for condition in 0..failures.len() {
                if let Some(earlier) = plan.earlier(condition) {
                    failures[condition] = failures[earlier];
                }
            }
        }
        let samples = samples.min(monte_carlo::MOST_SAMPLES);
        let told = |counts: [u64; 2]| counts.map(|count| Estimate { count, samples });
        let force = |state: usize| plan.model.states.get(state).is_some_and(|state| state.force > 0.0);
        Simulation {
            samples,
            seed,
            slips: self
                .slips
                .into_iter()
                .enumerate()
                .map(|(state, counts)| told(if force(state) { counts } else { [0; 2] }))
                .collect(),
            failures: self.failures.into_iter().map(|ring| ring.into_iter().map(told).collect()).collect(),
            spread: self.spread,
        }
    }
}
