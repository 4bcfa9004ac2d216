//! What is left of the pressure of the loosest pair at speed and with a hot hub, and where the joint slips.

use super::kernel::{Kernel, PairInterference};
use super::{DutyFindings, FindingsError};
use crate::joint::Joint;
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

/// The pressure of two rings, linear in ω² and in the free strain of the hub.
struct Map<'a> {
    joint: &'a Joint,
    at_rest: f64,
    by_square_speed: f64,
    by_strain: f64,
    from: f64,
    to: f64,
}

impl Map<'_> {
    /// Hub temperature that leaves this pressure at this speed; none outside the expansion curve.
    fn temperature(&self, pressure: f64, speed: f64) -> Option<f64> {
        let wanted = (self.at_rest - self.by_square_speed * speed * speed - pressure) / self.by_strain;
        let expansion = &self.joint.shaft_and_hub().1.material.expansion;
        let start = expansion.strain(self.from).ok()?;
        let excess =
            |temperature: f64| expansion.strain(temperature).map_or(f64::NAN, |e| e - start - wanted);
        let (low, high) = (expansion.range().0, self.to);
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
    let stack = kernel.stack(&loosest.grip, &kernel.shop);
    let influence = stack.influence()?;
    let mut turning = stack.clone();
    turning.angular_speed = 1.0;
    let turning = turning.influence()?;
    let first = |values: &nalgebra::DVector<f64>| values.get(0).copied().unwrap_or(0.0);
    let flexibility = first(&influence.diagonal);
    let at_rest = -first(&influence.free_gaps) / flexibility;
    if at_rest <= 0.0 {
        return Ok(None);
    }
    let (_, hub) = joint.shaft_and_hub();
    let map = Map {
        joint,
        at_rest,
        by_square_speed: (first(&turning.free_gaps) - first(&influence.free_gaps)) / flexibility,
        by_strain: 0.5 * joint.diameter / flexibility,
        from: joint.assembly.shop_temperature,
        to: hub.material.expansion.range().1,
    };
    let fastest = joint.duty.iter().map(|state| state.speed).fold(0.0, f64::max);
    let speed_to = match loosening_speed {
        Some(speed) if fastest > 0.0 => (1.05 * speed).min(4.0 * fastest),
        Some(speed) => 1.05 * speed,
        None if fastest > 0.0 => 2.0 * fastest,
        None => return Ok(None),
    };
    let lines = lines(&map, duty, speed_to);
    let states = states(&map, joint, duty);
    let hottest = lines.iter().flat_map(|line| &line.points).map(|point| point.1);
    let hottest = hottest.chain(states.iter().map(|state| state.temperature)).fold(map.from + 20.0, f64::max);
    let coldest = states.iter().map(|state| state.temperature).fold(map.from, f64::min);
    Ok(Some(Envelope { speed_to, temperatures: (coldest, hottest), lines, states }))
}

fn lines(map: &Map<'_>, duty: &[DutyFindings], speed_to: f64) -> Vec<EnvelopeLine> {
    let mut lines: Vec<EnvelopeLine> = [0.75, 0.5, 0.25]
        .into_iter()
        .map(|share| map.line(EnvelopeMeaning::Share(share), share * map.at_rest, speed_to))
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
