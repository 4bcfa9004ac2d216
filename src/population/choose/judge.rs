//! What must be met, and between which interferences it is.
//!
//! Safety against slip rises with the interference of the loosest pair. Press force and the change of temperature
//! for joining rise with that of the tightest pair. Stress does so too, unless speed or a pressure from outside
//! stresses a part that the grip relieves. So each requirement has one edge or two, and the edges together leave
//! the allowed window. The time from oven or bath to seated is no part of it: it is worked out fit by fit
//! ([`timing`](super::timing)).

use crate::findings::bath_temperature;
use crate::joint::{Joint, Method};
use crate::material::Kind;
use crate::population::kernel::joining::PlainJoining;
use crate::population::kernel::{Condition, KernelError, PairKind, Part, PlainJoint};
use crate::tolerance::FitLimits;

/// What is judged.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Subject {
    /// Safety against slip in the service state of this number, at the loosest pair.
    Slip(usize),
    /// Pressure left at the edges of the loosest pair under bending in the service state of this number.
    GapingEdge(usize),
    /// Strength of the shaft over the shop and every state, at both pairs.
    ShaftStrength,
    /// Strength of the hub, likewise.
    HubStrength,
    /// Strength at the loaded edge of the tightest pair under bending in the service state of this number.
    LoadedEdge(usize),
    /// Press force of the tightest pair at the high friction.
    PressForce,
    /// Temperature that the hub must reach for the tightest pair, alone or besides a bath.
    HubTemperature,
    /// Temperature that the shaft must reach for the tightest pair, against that of the bath.
    ShaftTemperature,
    /// Time from oven or bath until the tightest pair has no clearance left; judged fit by fit, without an edge.
    HandlingTime,
}

impl Subject {
    /// Whether its edges are part of the allowed window; what is not is judged for each fit by itself.
    pub fn has_edges(self) -> bool {
        self != Self::HandlingTime
    }

    /// Whether it is a matter of holding.
    pub fn is_of_holding(self) -> bool {
        matches!(self, Self::Slip(_) | Self::GapingEdge(_))
    }
}

/// Interference of the loosest and of the tightest pair as made, m.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(in crate::population) struct Made {
    pub(in crate::population) loosest: f64,
    pub(in crate::population) tightest: f64,
}

/// One requirement with the interferences that meet it.
#[derive(Debug, Clone, PartialEq)]
pub struct Requirement {
    /// What is judged.
    pub subject: Subject,
    /// The number it is held against: a safety, a force (N), a temperature (K) or a time (s); none when the end of an
    /// expansion curve alone sets the edge.
    pub required: Option<f64>,
    /// Least interference of the loosest pair as made that meets it, m, to the last digit of a double; none when
    /// there is no least one.
    pub least: Option<f64>,
    /// Greatest interference of the tightest pair that meets it, m, likewise.
    pub greatest: Option<f64>,
    /// Whether no interference meets it.
    pub never_met: bool,
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

/// Which of the three questions are answered as required.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(in crate::population) struct Met {
    pub(in crate::population) hold: bool,
    pub(in crate::population) strength: bool,
    pub(in crate::population) assembly: bool,
}

/// A joint with its requirements, ready to judge any interference.
#[derive(Debug, Clone)]
pub(in crate::population) struct Judge<'a> {
    joint: &'a Joint,
    plain: PlainJoint,
    joining: PlainJoining<'a>,
}

impl<'a> Judge<'a> {
    pub(in crate::population) fn of(joint: &'a Joint) -> Result<Self, KernelError> {
        let judge = Self { joint, plain: PlainJoint::of(joint)?, joining: PlainJoining::of(joint)? };
        // What the press formulas refuse whatever the interference is told at once.
        judge.plain.press_force(1.0, 1e-6, judge.plain.pressing.high)?;
        Ok(judge)
    }

    pub(in crate::population) fn plain(&self) -> &PlainJoint {
        &self.plain
    }

    pub(in crate::population) fn joining(&self) -> &PlainJoining<'a> {
        &self.joining
    }

    /// The time from oven or bath to seated that is required, s; none when nothing is heated or chilled.
    pub(in crate::population) fn handling_time(&self) -> Option<f64> {
        let plan = &self.joint.assembly;
        plan.practice.time_needed().filter(|_| plan.heats() || plan.chills())
    }

    /// Why the full computation refuses a pair of these limits; nothing when it does not.
    pub(super) fn refusal(&self, limits: &FitLimits) -> Option<KernelError> {
        let made = limits.interference();
        let pairs = [
            (made.loosest, PairKind::Loosest),
            (made.mean, PairKind::Mean),
            (made.tightest, PairKind::Tightest),
        ];
        pairs.into_iter().find_map(|(made, kind)| self.plain.pair(made, kind).err())
    }

    /// Whether a fit meets all that each of the three questions asks, the handling time left aside.
    pub(in crate::population) fn verdicts(&self, made: Made) -> Met {
        let mut met = Met { hold: true, strength: true, assembly: true };
        self.each_subject(|subject| {
            let ok = self.meets(subject, made);
            match subject {
                Subject::Slip(_) | Subject::GapingEdge(_) => met.hold &= ok,
                Subject::ShaftStrength | Subject::HubStrength | Subject::LoadedEdge(_) => met.strength &= ok,
                Subject::PressForce
                | Subject::HubTemperature
                | Subject::ShaftTemperature
                | Subject::HandlingTime => met.assembly &= ok,
            }
        });
        met
    }

    /// Every requirement of the joint that has edges, with them, in the order of the verdicts of a check.
    pub(in crate::population) fn requirements(&self) -> Vec<Requirement> {
        self.subjects().into_iter().map(|subject| self.requirement(subject)).collect()
    }

    /// The window that requirements leave.
    pub(in crate::population) fn window(requirements: &[Requirement]) -> Window {
        let mut window = Window { least: f64::NEG_INFINITY, greatest: None };
        for requirement in requirements {
            let (least, greatest) = match requirement.never_met {
                true => (Some(f64::INFINITY), Some(f64::NEG_INFINITY)),
                false => (requirement.least, requirement.greatest),
            };
            window.least = least.map_or(window.least, |least| window.least.max(least));
            window.greatest = match (window.greatest, greatest) {
                (Some(known), Some(own)) => Some(known.min(own)),
                (known, own) => known.or(own),
            };
        }
        window
    }

    fn subjects(&self) -> Vec<Subject> {
        let mut subjects = Vec::new();
        self.each_subject(|subject| subjects.push(subject));
        subjects
    }

    /// What is judged, in the order of the verdicts of a check.
    fn each_subject(&self, mut take: impl FnMut(Subject)) {
        let states = &self.plain.states;
        let mut each = |wanted: fn(&Condition) -> bool, subject: fn(usize) -> Subject| {
            let all = states.iter().enumerate().filter(|(_, state)| wanted(state));
            all.for_each(|(number, _)| take(subject(number)));
        };
        each(|state| state.slip_safety_per_pressure.is_some(), Subject::Slip);
        each(|state| state.edge_change.is_some(), Subject::GapingEdge);
        take(Subject::ShaftStrength);
        take(Subject::HubStrength);
        if self.plain.onset().is_some() {
            let bent = states.iter().enumerate().filter(|(_, state)| state.edge_change.is_some());
            bent.for_each(|(number, _)| take(Subject::LoadedEdge(number)));
        }
        match self.joint.assembly.method {
            Method::Press if self.joint.require.press_force.is_some() => take(Subject::PressForce),
            Method::Press => {}
            Method::HeatHub | Method::HeatAndChill => take(Subject::HubTemperature),
            Method::ChillShaft => take(Subject::ShaftTemperature),
        }
    }

    fn required(&self, subject: Subject) -> Option<f64> {
        let require = &self.joint.require;
        let strength = |part: Part| {
            let ring = self.joint.rings.get(if part == Part::Shaft { 0 } else { 1 });
            match ring.map(|ring| ring.material.kind) {
                Some(Kind::Brittle) => require.fracture_safety,
                _ => require.yield_safety,
            }
        };
        match subject {
            Subject::Slip(_) => Some(require.slip_safety),
            Subject::GapingEdge(_) => Some(1.0),
            Subject::ShaftStrength => Some(strength(Part::Shaft)),
            Subject::HubStrength => Some(strength(Part::Hub)),
            Subject::LoadedEdge(_) => self.plain.onset().map(|(_, part)| strength(part)),
            Subject::PressForce => require.press_force,
            Subject::HubTemperature => self.joining.hub_limit(),
            Subject::ShaftTemperature => Some(bath_temperature(self.joint.assembly.bath)),
            Subject::HandlingTime => self.handling_time(),
        }
    }

    /// What a fit gives; none when it does not exist, such as the safety of a ring that nothing stresses, and for the
    /// handling time, which no formula gives.
    pub(super) fn found(&self, subject: Subject, made: Made) -> Option<f64> {
        let plain = &self.plain;
        let loose = plain.effective(made.loosest, PairKind::Loosest);
        let tight = plain.effective(made.tightest, PairKind::Tightest);
        let strength = |part| plain.least_safety(part, loose, tight).map(|(safety, _)| safety);
        match subject {
            Subject::Slip(number) => {
                let state = plain.states.get(number)?;
                state.slip_safety_per_pressure.map(|gain| gain * plain.pressure_left(state, loose))
            }
            Subject::GapingEdge(number) => {
                let state = plain.states.get(number)?;
                let change = state.edge_change?;
                Some(if change > 0.0 { plain.pressure_left(state, loose) / change } else { 0.0 })
            }
            Subject::ShaftStrength => strength(Part::Shaft),
            Subject::HubStrength => strength(Part::Hub),
            Subject::LoadedEdge(number) => {
                let state = plain.states.get(number)?;
                Some(plain.onset()?.0 / (plain.pressure(state, tight) + state.edge_change?))
            }
            Subject::PressForce => self.press_force(tight).ok(),
            Subject::HubTemperature | Subject::ShaftTemperature => self.by_method(made.tightest).0,
            Subject::HandlingTime => None,
        }
    }

    /// Whether a fit meets the requirement.
    pub(super) fn meets(&self, subject: Subject, made: Made) -> bool {
        let (found, required) = (self.found(subject, made), self.required(subject));
        match subject {
            Subject::Slip(_) | Subject::GapingEdge(_) => {
                matches!((found, required), (Some(found), Some(required)) if found >= required)
            }
            Subject::ShaftStrength | Subject::HubStrength | Subject::LoadedEdge(_) => {
                required.is_none_or(|required| found.is_none_or(|found| found >= required))
            }
            Subject::PressForce => required.is_none_or(|allowed| found.is_some_and(|force| force <= allowed)),
            Subject::HubTemperature | Subject::ShaftTemperature => self.by_method(made.tightest).1,
            Subject::HandlingTime => true,
        }
    }

    fn press_force(&self, tight: f64) -> Result<f64, KernelError> {
        let pressure = self.plain.pressure(&self.plain.shop, tight);
        self.plain.press_force(pressure, tight, self.plain.pressing.high)
    }

    fn by_method(&self, made: f64) -> (Option<f64>, bool) {
        let plan = &self.joint.assembly;
        self.joining.by_method(plan.method, plan.bath, made).unwrap_or((None, true))
    }

    /// A requirement with its edges.
    fn requirement(&self, subject: Subject) -> Requirement {
        let required = self.required(subject);
        let none = Requirement { subject, required, least: None, greatest: None, never_met: false };
        // Beyond all fits; a pair looser than every other one stresses nothing, one tighter loosens nothing.
        let far = self.plain.diameter;
        let at_loosest = |loosest: f64| self.meets(subject, Made { loosest, tightest: f64::MIN });
        let at_tightest = |tightest: f64| self.meets(subject, Made { loosest: f64::MIN, tightest });
        match subject {
            Subject::Slip(_) | Subject::GapingEdge(_) => {
                let edge = Edge::between(at_loosest, far, -far);
                Requirement { least: edge.at(), never_met: edge == Edge::NeverMet, ..none }
            }
            Subject::LoadedEdge(_)
            | Subject::PressForce
            | Subject::HubTemperature
            | Subject::ShaftTemperature => {
                let edge = Edge::between(at_tightest, -far, far);
                Requirement { greatest: edge.at(), never_met: edge == Edge::NeverMet, ..none }
            }
            Subject::ShaftStrength => self.strength_edges(Part::Shaft, none, far),
            Subject::HubStrength => self.strength_edges(Part::Hub, none, far),
            Subject::HandlingTime => none,
        }
    }

    /// Both edges of a strength. Its equivalent stress over the interference first stays, then may fall, then rises,
    /// so the interferences that meet it are without a gap.
    fn strength_edges(&self, part: Part, none: Requirement, far: f64) -> Requirement {
        let required = none.required.unwrap_or(0.0);
        let utilisation = |effective: f64| {
            self.plain.least_safety(part, effective, effective).map_or(0.0, |(safety, _)| required / safety)
        };
        let loose = |made: f64| utilisation(self.plain.effective(made, PairKind::Loosest)) <= 1.0;
        let tight = |made: f64| utilisation(self.plain.effective(made, PairKind::Tightest)) <= 1.0;
        if tight(-far) {
            return Requirement { greatest: Edge::between(tight, -far, far).at(), ..none };
        }
        let best = least_of(utilisation, -far, far);
        if utilisation(best) > 1.0 {
            return Requirement { never_met: true, ..none };
        }
        // The loss by smoothing has to be made up before the loosest pair grips as much.
        let takes_loss = best > 0.0 && self.plain.takes_loss(PairKind::Loosest);
        let best_loosest = if takes_loss { best + self.plain.smoothing_loss } else { best };
        Requirement {
            least: Edge::between(loose, best_loosest, -far).at(),
            greatest: Edge::between(tight, best, far).at(),
            ..none
        }
    }
}

/// Where a requirement stops being met.
#[derive(Debug, Clone, Copy, PartialEq)]
enum Edge {
    None,
    At(f64),
    NeverMet,
}

impl Edge {
    /// The edge of a predicate that holds on one side, sought from an end where it should hold.
    fn between(predicate: impl Fn(f64) -> bool, meets: f64, misses: f64) -> Self {
        if predicate(misses) {
            Self::None
        } else if predicate(meets) {
            Self::At(last_that_meets(predicate, meets, misses))
        } else {
            Self::NeverMet
        }
    }

    fn at(self) -> Option<f64> {
        match self {
            Self::At(edge) => Some(edge),
            Self::None | Self::NeverMet => None,
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

/// Argument of the least value of a function that stays or falls, then rises; by thirds.
fn least_of(function: impl Fn(f64) -> f64, low: f64, high: f64) -> f64 {
    let (mut low, mut high) = (low, high);
    for _ in 0..200 {
        let third = (high - low) / 3.0;
        let (left, right) = (low + third, high - third);
        if function(left) < function(right) {
            high = right;
        } else {
            low = left;
        }
    }
    0.5 * (low + high)
}
