//! What must be met, and between which interferences it is.
//!
//! Safety against slip rises with the interference of the loosest pair. Stress, press force and the change of
//! temperature for joining rise with that of the tightest pair. So each requirement has one edge, and the
//! edges together leave the allowed window.

use crate::assembly::AssemblyError;
use crate::findings::bath_temperature;
use crate::joint::{Joint, Method};
use crate::material::Kind;
use crate::population::kernel::joining::PlainJoining;
use crate::population::kernel::{KernelError, PairKind, PlainJoint};

/// What is judged.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Subject {
    /// Safety against slip in the service state of this number, at the loosest pair.
    Slip(usize),
    /// Strength of the shaft over the shop and every state, at the tightest pair.
    ShaftStrength,
    /// Strength of the hub, likewise.
    HubStrength,
    /// Press force of the tightest pair at the high friction.
    PressForce,
    /// Temperature that the hub must reach for the tightest pair, alone or besides a bath.
    HubTemperature,
    /// Temperature that the shaft must reach for the tightest pair, against that of the bath.
    ShaftTemperature,
}

impl Subject {
    /// Whether it is judged at the loosest pair, and so wants a least interference.
    pub fn at_loosest(self) -> bool {
        matches!(self, Self::Slip(_))
    }
}

/// One requirement with its edge.
#[derive(Debug, Clone, PartialEq)]
pub struct Requirement {
    /// What is judged.
    pub subject: Subject,
    /// The number it is held against: a safety, a force (N) or a temperature (K); none when the end of an
    /// expansion curve alone sets the edge.
    pub required: Option<f64>,
    /// The interferences that meet it.
    pub edge: Edge,
}

/// Which interferences as made meet one requirement.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Edge {
    /// All of them.
    None,
    /// Those from here on (m), or up to here: the last one that does, to the last digit of a double.
    At(f64),
    /// None of them.
    NeverMet,
}

/// The interferences that meet every requirement, as made, m.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Window {
    /// Least interference of the loosest pair.
    pub least: f64,
    /// Greatest interference of the tightest pair; none when nothing limits it.
    pub greatest: Option<f64>,
}

impl Window {
    /// Whether a fit lies in the window.
    #[inline]
    pub fn holds(&self, loosest: f64, tightest: f64) -> bool {
        loosest >= self.least && self.greatest.is_none_or(|greatest| tightest <= greatest)
    }

    /// Distance of a fit from the nearer edge, m; negative when it lies outside.
    #[inline]
    pub fn margin(&self, loosest: f64, tightest: f64) -> f64 {
        let below = loosest - self.least;
        self.greatest.map_or(below, |greatest| below.min(greatest - tightest))
    }
}

/// A joint with its requirements, ready to judge any interference.
#[derive(Debug, Clone)]
pub(super) struct Judge<'a> {
    joint: &'a Joint,
    plain: PlainJoint,
    joining: PlainJoining<'a>,
}

impl<'a> Judge<'a> {
    pub(super) fn of(joint: &'a Joint) -> Result<Self, KernelError> {
        let judge = Self { joint, plain: PlainJoint::of(joint)?, joining: PlainJoining::of(joint)? };
        // What the press formulas refuse whatever the interference is told at once.
        judge.plain.press_force(1.0, 1e-6, judge.plain.pressing.high)?;
        Ok(judge)
    }

    pub(super) fn joint(&self) -> &Joint {
        self.joint
    }

    /// Every requirement of the joint with its edge, those of the loosest pair first.
    pub(super) fn requirements(&self) -> Vec<Requirement> {
        self.subjects()
            .into_iter()
            .map(|subject| Requirement {
                subject,
                required: self.required(subject),
                edge: self.edge(subject),
            })
            .collect()
    }

    /// The window that requirements leave.
    pub(super) fn window(requirements: &[Requirement]) -> Window {
        let mut window = Window { least: f64::NEG_INFINITY, greatest: None };
        for Requirement { subject, edge, .. } in requirements {
            let loosest = subject.at_loosest();
            let edge = match edge {
                Edge::None => continue,
                Edge::At(edge) => *edge,
                Edge::NeverMet if loosest => f64::INFINITY,
                Edge::NeverMet => f64::NEG_INFINITY,
            };
            if loosest {
                window.least = window.least.max(edge);
            } else {
                window.greatest = Some(window.greatest.map_or(edge, |greatest| greatest.min(edge)));
            }
        }
        window
    }

    fn subjects(&self) -> Vec<Subject> {
        let loaded = |number: &usize| {
            self.plain.states.get(*number).is_some_and(|state| state.slip_safety_per_pressure.is_some())
        };
        let mut subjects: Vec<Subject> =
            (0..self.plain.states.len()).filter(loaded).map(Subject::Slip).collect();
        subjects.extend([Subject::ShaftStrength, Subject::HubStrength]);
        match self.joint.assembly.method {
            Method::Press if self.joint.require.press_force.is_some() => subjects.push(Subject::PressForce),
            Method::Press => {}
            Method::HeatHub | Method::HeatAndChill => subjects.push(Subject::HubTemperature),
            Method::ChillShaft => subjects.push(Subject::ShaftTemperature),
        }
        subjects
    }

    fn required(&self, subject: Subject) -> Option<f64> {
        let require = &self.joint.require;
        let strength = |ring: usize| match self.joint.rings.get(ring).map(|ring| ring.material.kind) {
            Some(Kind::Brittle) => require.fracture_safety,
            _ => require.yield_safety,
        };
        match subject {
            Subject::Slip(_) => Some(require.slip_safety),
            Subject::ShaftStrength => Some(strength(0)),
            Subject::HubStrength => Some(strength(1)),
            Subject::PressForce => require.press_force,
            Subject::HubTemperature => self.joining.hub_limit(),
            Subject::ShaftTemperature => Some(bath_temperature(self.joint.assembly.bath)),
        }
    }

    /// What a pair of this interference as made (m) gives; none when it does not exist, such as the safety of
    /// a ring that nothing stresses.
    pub(super) fn found(&self, subject: Subject, made: f64) -> Option<f64> {
        let plain = &self.plain;
        let tight = || plain.effective(made, PairKind::Tightest);
        match subject {
            Subject::Slip(number) => {
                let state = plain.states.get(number)?;
                let pressure = plain.pressure(state, plain.effective(made, PairKind::Loosest));
                state.slip_safety_per_pressure.map(|gain| gain * pressure)
            }
            Subject::ShaftStrength => plain.shaft.safety(plain.highest_pressure(tight()).0),
            Subject::HubStrength => plain.hub.safety(plain.highest_pressure(tight()).0),
            Subject::PressForce => self.press_force(made).ok(),
            Subject::HubTemperature | Subject::ShaftTemperature => self.by_method(made).0,
        }
    }

    /// Whether a pair of this interference as made (m) meets the requirement.
    pub(super) fn meets(&self, subject: Subject, made: f64) -> bool {
        let (found, required) = (self.found(subject, made), self.required(subject));
        match subject {
            Subject::Slip(_) => {
                matches!((found, required), (Some(found), Some(required)) if found >= required)
            }
            Subject::ShaftStrength | Subject::HubStrength => {
                required.is_none_or(|required| found.is_none_or(|found| found >= required))
            }
            Subject::PressForce => required.is_none_or(|allowed| found.is_some_and(|force| force <= allowed)),
            Subject::HubTemperature | Subject::ShaftTemperature => self.by_method(made).1,
        }
    }

    fn press_force(&self, made: f64) -> Result<f64, KernelError> {
        let effective = self.plain.effective(made, PairKind::Tightest);
        let pressure = self.plain.pressure(&self.plain.shop, effective);
        match self.plain.press_force(pressure, effective, self.plain.pressing.high) {
            // A pair that only the temperature of the shop closes has no chamfer to squeeze in.
            Err(KernelError::Assembly(AssemblyError::OutsideRange { .. })) if effective <= 0.0 => Ok(0.0),
            force => force,
        }
    }

    fn by_method(&self, made: f64) -> (Option<f64>, bool) {
        let plan = &self.joint.assembly;
        self.joining.by_method(plan.method, plan.bath, made).unwrap_or((None, true))
    }

    fn edge(&self, subject: Subject) -> Edge {
        let far = self.plain.diameter;
        let (meets, misses) = if subject.at_loosest() { (far, -far) } else { (-far, far) };
        if self.meets(subject, misses) {
            Edge::None
        } else if self.meets(subject, meets) {
            Edge::At(last_that_meets(|made| self.meets(subject, made), meets, misses))
        } else {
            Edge::NeverMet
        }
    }
}

/// The last number on the way from `meets` to `misses` at which the predicate holds.
fn last_that_meets(predicate: impl Fn(f64) -> bool, meets: f64, misses: f64) -> f64 {
    let (mut good, mut bad) = (meets, misses);
    loop {
        let middle = 0.5 * (good + bad);
        if middle == good || middle == bad {
            return good;
        }
        if predicate(middle) {
            good = middle;
        } else {
            bad = middle;
        }
    }
}
