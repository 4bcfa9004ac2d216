//! The population by integration: every probability to the accuracy of the quadrature, far into the tails.
//!
//! A probability is an expected value of the share of the interferences below or above a threshold. The threshold
//! depends on the other quantities only through C/μ (capacity) or C (stress) and the thermal interference, whose
//! laws are added up first; what is left is one integral, two when temperatures scatter, split at every kink of
//! the interference mapped onto the variable of integration.

use std::f64::consts::PI;

use super::model::{Model, State, Stiffness};
use super::{Quantity, ScatterError};
use crate::numerics::root;
use crate::population::distribution::Shape;
use crate::population::distribution::{Distribution, DistributionError};
use crate::population::integration::law::Law;

/// Most different interferences of measured parts beside a roughness that scatters: the sum takes a second or so.
const MOST_SUMS: usize = 1000;

/// Laws of everything that the formulas need.
pub struct Analysis<'a> {
    model: &'a Model,
    /// U as made, m.
    made: Law,
    /// U − G, m.
    smoothed: Law,
    /// C, m/Pa.
    compliance: Law,
    /// ln(C/μ).
    log_ratio: Law,
    /// Both in each state; none where its moduli are those of the shop.
    warm: Vec<Option<Warm>>,
    friction: Law,
    pressing: Law,
    /// Thermal interference of each state.
    thermals: Vec<Law>,
    /// Kinks of the share of grips below a value, with loss and without.
    kinks: [Vec<f64>; 2],
}

/// Compliance, and ln(C/μ), in a state whose moduli are not those of the shop.
struct Warm {
    compliance: Law,
    log_ratio: Law,
}

impl<'a> Analysis<'a> {
    /// Adds up the laws of a model.
    ///
    /// # Errors
    /// As [`Model::check`]; a difference of normals that is none.
    pub fn of(model: &'a Model) -> Result<Self, ScatterError> {
        model.check()?;
        let population = &model.population;
        let made = difference(&population.shaft, &population.hole)?;
        let factor = model.smoothing_factor;
        let loss = if factor == 0.0 {
            Law::fixed(0.0)
        } else {
            let part = |roughness: &Distribution| Law::of(roughness).scaled(-factor, 0.0);
            part(&population.shaft_roughness).sum(&part(&population.hub_roughness))
        };
        if let (Law::Atoms(atoms), Law::Curve(_)) = (&made, &loss)
            && atoms.len() > MOST_SUMS
        {
            return Err(ScatterError::TooManyValues { count: atoms.len(), most: MOST_SUMS });
        }
        let smoothed = made.sum(&loss);
        let part = |modulus: &Distribution, factor: f64| {
            let gain = model.diameter * factor;
            Law::of(modulus).mapped(|e| gain / e, |y| (gain / y, gain / (y * y)))
        };
        let compliance_with = |stiffness: Stiffness| {
            part(&population.hub_modulus, model.hub_factor / stiffness.hub)
                .sum(&part(&population.shaft_modulus, model.shaft_factor / stiffness.shaft))
        };
        let compliance = compliance_with(model.shop_stiffness);
        let friction = Law::of(&population.friction);
        let inverse = friction.mapped(|m| -m.ln(), |y| ((-y).exp(), (-y).exp()));
        let log_ratio = compliance.logarithm().sum(&inverse);
        let warm = |state: &State| {
            (state.stiffness != model.shop_stiffness).then(|| {
                let compliance = compliance_with(state.stiffness);
                let log_ratio = compliance.logarithm().sum(&inverse);
                Warm { compliance, log_ratio }
            })
        };
        let warm = model.states.iter().map(warm).collect();
        let mut with_loss: Vec<f64> = smoothed.kinks();
        with_loss.extend(made.kinks().into_iter().filter(|kink| *kink <= 0.0));
        with_loss.push(0.0);
        let kinks = [made.kinks(), with_loss];
        let thermals = model.states.iter().map(|state| thermal(model, state)).collect::<Result<_, _>>()?;
        Ok(Self {
            model,
            thermals,
            pressing: Law::of(&population.pressing),
            made,
            smoothed,
            compliance,
            log_ratio,
            warm,
            friction,
            kinks,
        })
    }

    /// Law of the interference as made.
    pub fn made(&self) -> &Law {
        &self.made
    }

    fn kinks(&self, loss: bool) -> &[f64] {
        &self.kinks[usize::from(loss)]
    }

    /// Share of pairs whose grip is below `t`.
    fn grip_below(&self, loss: bool, t: f64) -> f64 {
        if loss && t > 0.0 { self.smoothed.below(t) } else { self.made.below(t) }
    }

    /// Share of pairs whose grip is above `t`.
    fn grip_above(&self, loss: bool, t: f64) -> f64 {
        if loss && t >= 0.0 { self.smoothed.above(t) } else { self.made.above(t) }
    }

    /// Probability that a joint slips in state number `state` under `safety` times its load.
    pub fn slip(&self, state: usize, safety: f64) -> f64 {
        let Some(State { force, .. }) = self.model.states.get(state) else { return 0.0 };
        let force = safety * force;
        if force <= 0.0 {
            return 0.0;
        }
        let loss = self.model.loss_when_holding;
        let gain = force / self.model.area();
        let log_ratio = self.warm[state].as_ref().map_or(&self.log_ratio, |warm| &warm.log_ratio);
        let at = |thermal: f64| {
            self.over(
                log_ratio,
                |log| gain * log.exp(),
                |t| (t / gain).ln(),
                loss,
                thermal,
                |t| self.grip_below(loss, t),
            )
        };
        self.thermals[state].expect(&[], at).clamp(0.0, 1.0)
    }

    /// Probability that the contact pressure exceeds `pressure` in a condition.
    pub fn exceeds(&self, condition: usize, pressure: f64) -> f64 {
        if pressure <= 0.0 {
            return 1.0;
        }
        if pressure == f64::INFINITY {
            return 0.0;
        }
        let loss = self.model.loss_under_stress;
        let warm = condition.checked_sub(1).and_then(|state| self.warm.get(state)?.as_ref());
        let compliance = warm.map_or(&self.compliance, |warm| &warm.compliance);
        let at = |thermal: f64| {
            self.over(
                compliance,
                |c| pressure * c,
                |t| t / pressure,
                loss,
                thermal,
                |t| self.grip_above(loss, t),
            )
        };
        let share = match condition.checked_sub(1).and_then(|state| self.thermals.get(state)) {
            Some(thermal) => thermal.expect(&[], at),
            None => at(self.model.shop_thermal),
        };
        share.clamp(0.0, 1.0)
    }

    /// Expected share over a law: the threshold of the grip is `of(x)` less the thermal interference.
    fn over(
        &self,
        law: &Law,
        of: impl Fn(f64) -> f64,
        back: impl Fn(f64) -> f64,
        loss: bool,
        thermal: f64,
        share: impl Fn(f64) -> f64,
    ) -> f64 {
        let breaks: Vec<f64> =
            self.kinks(loss).iter().map(|kink| kink + thermal).filter(|t| *t > 0.0).map(back).collect();
        law.expect(&breaks, |x| share(of(x) - thermal))
    }

    /// Share of pairs with a quantity strictly below `x`.
    pub fn below(&self, quantity: Quantity, x: f64) -> f64 {
        self.share(quantity, x, true)
    }

    /// Share of pairs with a quantity strictly above `x`.
    pub fn above(&self, quantity: Quantity, x: f64) -> f64 {
        self.share(quantity, x, false)
    }

    fn share(&self, quantity: Quantity, x: f64, below: bool) -> f64 {
        let model = self.model;
        let side =
            |loss: bool, t: f64| if below { self.grip_below(loss, t) } else { self.grip_above(loss, t) };
        let (hold, stress, thermal) = (model.loss_when_holding, model.loss_under_stress, model.shop_thermal);
        match quantity {
            Quantity::Interference => return if below { self.made.below(x) } else { self.made.above(x) },
            Quantity::EffectiveInterference => return side(hold, x),
            _ if x < 0.0 || (x == 0.0 && below) => return if below { 0.0 } else { 1.0 },
            _ => {}
        }
        let found = match quantity {
            Quantity::Interference | Quantity::EffectiveInterference => 0.0,
            Quantity::Pressure | Quantity::HubStress => {
                let (loss, pressure) =
                    if quantity == Quantity::Pressure { (hold, x) } else { (stress, x / model.hub_stress) };
                self.over(
                    &self.compliance,
                    |c| pressure * c,
                    |t| t / pressure,
                    loss,
                    thermal,
                    |t| side(loss, t),
                )
            }
            Quantity::TorqueCapacity => {
                let gain = x / (model.area() * model.arm());
                let back = |t: f64| (t / gain).ln();
                self.over(&self.log_ratio, |log| gain * log.exp(), back, hold, thermal, |t| side(hold, t))
            }
            Quantity::PressForce => self.press_share(x, below),
        };
        found.clamp(0.0, 1.0)
    }

    /// The press force rises with the grip, so a force has one grip that gives it at each friction and compliance.
    fn press_share(&self, force: f64, below: bool) -> f64 {
        let model = self.model;
        let loss = model.loss_under_stress;
        let kinks = self.kinks(loss);
        let side = |t: f64| if below { self.grip_below(loss, t) } else { self.grip_above(loss, t) };
        let at = |compliance: f64| {
            let breaks: Vec<f64> =
                kinks.iter().filter_map(|kink| self.friction_at(force, *kink, compliance)).collect();
            self.pressing.expect(&breaks, |friction| side(self.grip_at(force, compliance, friction)))
        };
        match &self.compliance {
            Law::Atoms(_) => self.compliance.expect(&[], at),
            Law::Curve(_) => spread(&self.compliance).into_iter().map(|(c, share)| share * at(c)).sum(),
        }
    }

    /// Grip (m) at which the press force is `force`.
    fn grip_at(&self, force: f64, compliance: f64, friction: f64) -> f64 {
        let model = self.model;
        let chamfer = model.chamfer_factor(friction);
        let along = friction * model.engaged_length;
        let wanted = force * compliance / (PI * model.diameter);
        // W (μ l + B W) = wanted with the overlap W = V + θ, the root above zero without cancellation.
        let half = 0.5 * along;
        wanted / (half + (half * half + chamfer * wanted).sqrt()) - model.shop_thermal
    }

    /// Friction within its support at which a grip gives a force.
    fn friction_at(&self, force: f64, grip: f64, compliance: f64) -> Option<f64> {
        let (low, high) = self.pressing.support();
        let miss = |friction: f64| self.model.press_force(grip, compliance, friction) - force;
        if low >= high || (miss(low) > 0.0) == (miss(high) > 0.0) {
            return None;
        }
        root::bracketed(miss, low, high, 0.0).ok()
    }

    /// Least and greatest value of a quantity.
    pub fn support(&self, quantity: Quantity) -> (f64, f64) {
        let model = self.model;
        let made = self.made.support();
        let loss = self.smoothed.support();
        let grip = |taken: bool, end: (f64, f64)| {
            if taken {
                let clip = |u: f64, smoothed: f64| if u <= 0.0 { u } else { smoothed.max(0.0) };
                (clip(end.0, loss.0), clip(end.1, loss.1))
            } else {
                end
            }
        };
        let hold = grip(model.loss_when_holding, made);
        let stress = grip(model.loss_under_stress, made);
        let (soft, stiff) = (self.compliance.support().1, self.compliance.support().0);
        let pressed = |end: (f64, f64)| {
            let open = |v: f64| (v + model.shop_thermal).max(0.0);
            (open(end.0) / soft, open(end.1) / stiff)
        };
        match quantity {
            Quantity::Interference => made,
            Quantity::EffectiveInterference => hold,
            Quantity::Pressure => pressed(hold),
            Quantity::HubStress => {
                let (low, high) = pressed(stress);
                (low * model.hub_stress, high * model.hub_stress)
            }
            Quantity::TorqueCapacity => {
                let (low, high) = pressed(hold);
                let (least, most) = self.friction.support();
                let gain = model.area() * model.arm();
                (low * least * gain, high * most * gain)
            }
            Quantity::PressForce => {
                let (least, most) = self.pressing.support();
                (model.press_force(stress.0, soft, least), model.press_force(stress.1, stiff, most))
            }
        }
    }

    /// Value with a share `level` below it.
    ///
    /// # Errors
    /// The root is not found, which is a fault of the laws.
    pub fn quantile(&self, quantity: Quantity, level: f64) -> Result<f64, ScatterError> {
        let (low, high) = self.support(quantity);
        let miss = |x: f64| {
            if level <= 0.5 {
                self.below(quantity, x) - level
            } else {
                (1.0 - level) - self.above(quantity, x)
            }
        };
        // A share may sit on the lowest value: pairs without grip.
        let step = 1e-12 * (high - low);
        if low >= high || miss(low + step) >= 0.0 {
            return Ok(low);
        }
        if miss(high) < 0.0 {
            return Ok(high);
        }
        Ok(root::bracketed(miss, low + step, high, 1e-13 * (high - low))?)
    }

    /// Mean and standard deviation of a quantity.
    pub fn moments(&self, quantity: Quantity) -> (f64, f64) {
        let model = self.model;
        let (first, second) = match quantity {
            Quantity::Interference => return (self.made.mean(), self.made.variance().sqrt()),
            Quantity::EffectiveInterference => {
                let mean = self.over_grip(model.loss_when_holding, |v| v);
                let square = self.over_grip(model.loss_when_holding, |v| (v - mean) * (v - mean));
                return (mean, square.max(0.0).sqrt());
            }
            Quantity::Pressure => self.pressure_moments(model.loss_when_holding),
            Quantity::HubStress => {
                let (first, second) = self.pressure_moments(model.loss_under_stress);
                (first * model.hub_stress, second * model.hub_stress * model.hub_stress)
            }
            Quantity::TorqueCapacity => {
                let (first, second) = self.pressure_moments(model.loss_when_holding);
                let gain = model.area() * model.arm();
                let square = self.friction.expect(&[], |m| m * m);
                (first * self.friction.mean() * gain, second * square * gain * gain)
            }
            Quantity::PressForce => self.press_moments(),
        };
        (first, (second - first * first).max(0.0).sqrt())
    }

    fn press_moments(&self) -> (f64, f64) {
        let model = self.model;
        let inverse = |power: i32| self.compliance.expect(&[], |c| c.powi(-power));
        let moment = |power: i32| {
            let over = |friction: f64| {
                self.over_grip(model.loss_under_stress, |v| model.press_force(v, 1.0, friction).powi(power))
            };
            self.pressing.expect(&[], over)
        };
        (moment(1) * inverse(1), moment(2) * inverse(2))
    }

    fn pressure_moments(&self, loss: bool) -> (f64, f64) {
        let thermal = self.model.shop_thermal;
        let open = |v: f64| (v + thermal).max(0.0);
        let first = self.over_grip(loss, open) * self.compliance.expect(&[], |c| 1.0 / c);
        let second =
            self.over_grip(loss, |v| open(v).powi(2)) * self.compliance.expect(&[], |c| 1.0 / (c * c));
        (first, second)
    }

    /// Expected value of a function of the grip, which may have a kink at −θ.
    fn over_grip(&self, loss: bool, function: impl Fn(f64) -> f64) -> f64 {
        let breaks = [0.0, -self.model.shop_thermal];
        if !loss {
            return self.made.expect(&breaks, function);
        }
        let open = self.made.expect(&breaks, |u| if u <= 0.0 { function(u) } else { 0.0 });
        let closed = self.smoothed.expect(&breaks, |v| if v > 0.0 { function(v) } else { 0.0 });
        let at_zero = (self.made.above(0.0) - self.smoothed.above(0.0)).max(0.0);
        open + closed + at_zero * function(0.0)
    }
}

/// Law of the thermal interference of a state.
fn thermal(model: &Model, state: &State) -> Result<Law, ScatterError> {
    let Some(warm) = state.warm.as_ref().filter(|_| model.scatters_in_temperature()) else {
        return Ok(Law::fixed(state.thermal));
    };
    let population = &model.population;
    let diameter = model.diameter;
    let part = |offset: &Distribution, only_shaft: bool| -> Result<Law, ScatterError> {
        let value = |offset: f64| {
            let (hot, cold) = if only_shaft { (offset, 0.0) } else { (0.0, offset) };
            warm.thermal(diameter, hot, cold) - state.thermal
        };
        let (low, high) = offset.support();
        let rises = value(high) > value(low);
        let steps: Vec<f64> = (0..=32).map(|i| value(low + (high - low) * f64::from(i) / 32.0)).collect();
        if high > low && !steps.windows(2).all(|pair| (pair[1] > pair[0]) == rises && pair[1] != pair[0]) {
            return Err(ScatterError::NotMonotone { state: state.name.clone() });
        }
        let back = |y: f64| {
            let x = root::bracketed(|x| value(x) - y, low, high, 0.0)
                .unwrap_or(if (y > value(low)) == rises { high } else { low });
            // Four points: exact on the cubics of an expansion curve.
            let step = 1e-3 * (high - low);
            let wide = value(x + 2.0 * step) - value(x - 2.0 * step);
            let near = value(x + step) - value(x - step);
            (x, (12.0 * step / (8.0 * near - wide)).abs())
        };
        Ok(Law::of(offset).mapped(value, back))
    };
    let sum = part(&population.shaft_temperature, true)?.sum(&part(&population.hub_temperature, false)?);
    Ok(sum.scaled(1.0, state.thermal))
}

/// Law of shaft minus hole; of two normals the normal itself.
fn difference(shaft: &Distribution, hole: &Distribution) -> Result<Law, DistributionError> {
    match (shaft.shape(), hole.shape()) {
        (Shape::Normal { mean: a, sd: s }, Shape::Normal { mean: b, sd: h }) => {
            Ok(Law::of(&Distribution::normal(a - b, s.hypot(*h))?))
        }
        _ => Ok(Law::of(shaft).sum(&Law::of(hole).scaled(-1.0, 0.0))),
    }
}

/// A smooth narrow law as a few weighted values: Simpson's rule on 64 slices of its middle 16 deviations.
fn spread(law: &Law) -> Vec<(f64, f64)> {
    let (mean, sd) = (law.mean(), law.variance().sqrt());
    let (low, high) = law.support();
    let (from, to) = ((mean - 8.0 * sd).max(low), (mean + 8.0 * sd).min(high));
    let slices = 64;
    let weight = |i: i32| if i == 0 || i == slices { 1.0 } else { f64::from(2 + 2 * (i % 2)) };
    let values: Vec<(f64, f64)> = (0..=slices)
        .map(|i| {
            let x = from + (to - from) * f64::from(i) / f64::from(slices);
            (x, weight(i) * law.density(x))
        })
        .collect();
    let total: f64 = values.iter().map(|(_, share)| share).sum();
    values.into_iter().map(|(x, share)| (x, share / total)).collect()
}
