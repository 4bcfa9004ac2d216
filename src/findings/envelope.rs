//! What is left of the pressure of the loosest pair at speed and with a hot hub, and where the joint slips.

use super::kernel::{Kernel, PairInterference};
use super::{DutyFindings, FindingsError};
use crate::joint::Joint;
use crate::mechanics::ring::RingLoad;
use crate::numerics::root;

/// Lines of equal pressure over speed and hub temperature, for the loosest pair with the shaft at shop temperature.
#[derive(Debug, Clone, PartialEq)]
pub struct Envelope {
    /// Greatest speed of the picture, rad/s.
    pub speed_to: f64,
    /// Lowest and highest hub temperature of the picture, K.
    pub temperatures: (f64, f64),
    /// The lines, from the highest pressure to the opening of the joint.
    pub lines: Vec<EnvelopeLine>,
    /// The service states.
    pub states: Vec<EnvelopeState>,
}

/// What a line of the envelope means.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum EnvelopeMeaning {
    /// This share of the pressure at rest is left.
    Share(f64),
    /// The joint slips under the most demanding state.
    Slips,
    /// The safety that is required is just met in the most demanding state.
    Required,
    /// The joint opens.
    Opens,
}

/// A line of equal pressure.
#[derive(Debug, Clone, PartialEq)]
pub struct EnvelopeLine {
    /// What it means.
    pub meaning: EnvelopeMeaning,
    /// Its pressure, Pa.
    pub pressure: f64,
    /// Speed (rad/s) and hub temperature (K), by rising speed.
    pub points: Vec<(f64, f64)>,
}

/// A service state in the picture: at its own speed, and at the hub temperature that leaves its pressure.
#[derive(Debug, Clone, PartialEq)]
pub struct EnvelopeState {
    /// Index of the state.
    pub state: usize,
    /// Speed, rad/s.
    pub speed: f64,
    /// Hub temperature at which the map has the state's pressure, K.
    pub temperature: f64,
    /// Pressure of the loosest pair, Pa.
    pub pressure: f64,
}

const POINTS: usize = 60;

/// The pressure of two rings at any speed and hub temperature, with the hub's modulus at that temperature.
///
/// p = (U/2 + d/2 (ε_s − ε_h) − ω² (v_h/k − v_s)) / (F_s + F_h/k)
///
/// U interference, ε free strains, v growth of the free faces by unit speed, F radial flexibility of shaft and hub (m/Pa),
/// the hub's v and F at the shop temperature, k its modulus over that at the shop temperature. The pressure falls as the
/// hub grows warmer for as long as the joint grips, by expansion and by the fall of k alike.
struct Map<'a> {
    joint: &'a Joint,
    /// Radial overlap at rest at the shop temperature, m.
    overlap: f64,
    hub_growth: f64,
    shaft_growth: f64,
    hub_flexibility: f64,
    shaft_flexibility: f64,
    /// Free strain and modulus of the hub at the shop temperature.
    shop_strain: f64,
    shop_modulus: f64,
    from: f64,
    to: f64,
}

impl Map<'_> {
    /// Pressure at a speed (rad/s) and a hub temperature (K); negative beyond the opening, none outside the curves.
    fn pressure(&self, speed: f64, temperature: f64) -> Option<f64> {
        let material = &self.joint.shaft_and_hub().1.material;
        let strain = material.expansion.strain(temperature).ok()? - self.shop_strain;
        let softer = self.shop_modulus / material.youngs_modulus_at(temperature).ok()?;
        let grown = speed * speed * (self.hub_growth * softer - self.shaft_growth);
        let overlap = self.overlap - 0.5 * self.joint.diameter * strain - grown;
        Some(overlap / (self.shaft_flexibility + self.hub_flexibility * softer))
    }

    /// Hub temperature that leaves this pressure at this speed; none outside the hub's curves.
    fn temperature(&self, pressure: f64, speed: f64) -> Option<f64> {
        let excess =
            |temperature: f64| self.pressure(speed, temperature).map_or(f64::NAN, |found| pressure - found);
        let (low, high) = (self.joint.shaft_and_hub().1.material.temperature_range().0, self.to);
        root::bracketed(excess, low, high, 1e-9).ok()
    }

    fn line(&self, meaning: EnvelopeMeaning, pressure: f64, speed_to: f64) -> EnvelopeLine {
        let speeds = (0..=POINTS).map(|step| speed_to * step as f64 / POINTS as f64);
        let points = speeds.filter_map(|speed| Some((speed, self.temperature(pressure, speed)?)));
        EnvelopeLine { meaning, pressure, points: points.filter(|point| point.1 >= self.from).collect() }
    }
}

/// The envelope; none unless two rings of one section grip at rest.
pub(super) fn envelope(
    joint: &Joint,
    kernel: &Kernel<'_>,
    loosest: &PairInterference,
    duty: &[DutyFindings],
    loosening_speed: Option<f64>,
) -> Result<Option<Envelope>, FindingsError> {
    if joint.rings.len() != 2 || !joint.slices.is_empty() {
        return Ok(None);
    }
    let stack = kernel.stack(&loosest.grip, &kernel.shop)?;
    let influence = stack.influence()?;
    let first = |values: &nalgebra::DVector<f64>| values.get(0).copied().unwrap_or(0.0);
    let (flexibility, overlap) = (first(&influence.diagonal), -first(&influence.free_gaps));
    let [inside, outside] = stack.rings.as_slice() else { return Ok(None) };
    if overlap <= 0.0 {
        return Ok(None);
    }
    let turning = RingLoad { angular_speed: 1.0, ..RingLoad::default() };
    let in_bore = RingLoad { inner_pressure: 1.0, ..RingLoad::default() };
    let (_, hub) = joint.shaft_and_hub();
    let hub_flexibility = outside.displacement_at(&in_bore, outside.inner_radius())?;
    let map = Map {
        joint,
        overlap,
        hub_growth: outside.displacement_at(&turning, outside.inner_radius())?,
        shaft_growth: inside.displacement_at(&turning, inside.outer_radius())?,
        hub_flexibility,
        shaft_flexibility: flexibility - hub_flexibility,
        shop_strain: stack.free_strain.last().copied().unwrap_or(0.0),
        shop_modulus: outside.youngs_modulus(),
        from: joint.assembly.shop_temperature,
        to: hub.material.temperature_range().1,
    };
    let at_rest = overlap / flexibility;
    let fastest = joint.duty.iter().map(|state| state.speed).fold(0.0, f64::max);
    let speed_to = match loosening_speed {
        Some(speed) if fastest > 0.0 => (1.05 * speed).min(4.0 * fastest),
        Some(speed) => 1.05 * speed,
        None if fastest > 0.0 => 2.0 * fastest,
        None => return Ok(None),
    };
    let lines = lines(&map, duty, at_rest, speed_to);
    let states = states(&map, joint, duty);
    let hottest = lines.iter().flat_map(|line| &line.points).map(|point| point.1);
    let hottest = hottest.chain(states.iter().map(|state| state.temperature)).fold(map.from + 20.0, f64::max);
    let coldest = states.iter().map(|state| state.temperature).fold(map.from, f64::min);
    Ok(Some(Envelope { speed_to, temperatures: (coldest, hottest), lines, states }))
}

fn lines(map: &Map<'_>, duty: &[DutyFindings], at_rest: f64, speed_to: f64) -> Vec<EnvelopeLine> {
    let mut lines: Vec<EnvelopeLine> = [0.75, 0.5, 0.25]
        .into_iter()
        .map(|share| map.line(EnvelopeMeaning::Share(share), share * at_rest, speed_to))
        .collect();
    // Safety against slip is proportional to the pressure, so a state slips at its pressure over its safety.
    let slips = duty
        .iter()
        .zip(&map.joint.duty)
        .filter_map(|(found, state)| {
            let fresh = found.loosest.pressure / state.relaxation;
            Some(fresh / found.loosest.slip_safety.filter(|safety| *safety > 0.0)?)
        })
        .fold(0.0, f64::max);
    if slips > 0.0 {
        let required = map.joint.require.slip_safety * slips;
        lines.push(map.line(EnvelopeMeaning::Required, required, speed_to));
        lines.push(map.line(EnvelopeMeaning::Slips, slips, speed_to));
    }
    lines.push(map.line(EnvelopeMeaning::Opens, 0.0, speed_to));
    lines.retain(|line| line.points.len() > 1);
    lines
}

fn states(map: &Map<'_>, joint: &Joint, duty: &[DutyFindings]) -> Vec<EnvelopeState> {
    joint
        .duty
        .iter()
        .zip(duty)
        .enumerate()
        .filter_map(|(index, (state, found))| {
            let pressure = found.loosest.pressure / state.relaxation;
            if pressure <= 0.0 {
                return None;
            }
            let temperature = map.temperature(pressure, state.speed)?;
            Some(EnvelopeState { state: index, speed: state.speed, temperature, pressure })
        })
        .collect()
}
