//! When no fit meets the requirements: the smallest change of one number that lets one in.
//!
//! How far the best fit is from the window is a function of each number of the joint: negative while every fit
//! lies outside, zero where the first one comes in. Going away from the present value in small steps brackets
//! that zero, a bracketed root finds it, and the search is run again with the number as it would be written. The
//! handling time has no edge: the search goes by the other requirements, and what it lets in must meet the time as well.

use super::candidate::{Candidate, Candidates, narrowest};
use super::judge::{Judge, Window};
use super::ranking::Rules;
use super::{ChooseError, ChosenFit};
use crate::assembly::bearing_tables::BearingRing;
use crate::joint::{Joint, Ring};
use crate::material::{Kind as MaterialKind, Range};
use crate::numerics::root::bracketed;
use crate::quantity::{Kind, UnitSystem, parse};
use crate::tolerance::iso286::Grade;

/// A number of the joint that may be changed.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Parameter {
    /// Outer diameter of the hub, m.
    HubOuterDiameter,
    /// Length of the hub, m.
    Length,
    /// Strength of the shaft that its criterion uses, Pa.
    ShaftStrength,
    /// Strength of the hub that its criterion uses, Pa.
    HubStrength,
    /// Least coefficient of friction against slip.
    HoldingFriction,
}

impl Parameter {
    /// All of them, in the order in which they are told.
    pub const ALL: [Self; 5] =
        [Self::HubOuterDiameter, Self::Length, Self::ShaftStrength, Self::HubStrength, Self::HoldingFriction];

    /// Key of the joint file; none for a strength, which comes with the material.
    pub fn key(self) -> Option<&'static str> {
        match self {
            Self::HubOuterDiameter => Some("hub.outer_diameter"),
            Self::Length => Some("length"),
            Self::HoldingFriction => Some("friction.holding"),
            Self::ShaftStrength | Self::HubStrength => None,
        }
    }

    /// Its value in a joint; none when the joint has no such number, and for what a bearing settles.
    pub fn of(self, joint: &Joint) -> Option<f64> {
        let settled = joint.bearing.as_ref().is_some_and(|seat| match self {
            Self::HubOuterDiameter | Self::HubStrength => seat.ring == BearingRing::Inner,
            Self::ShaftStrength => seat.ring == BearingRing::Outer,
            Self::Length => true,
            Self::HoldingFriction => false,
        });
        if settled {
            return None;
        }
        match self {
            Self::HubOuterDiameter => Some(joint.rings.get(1)?.outer_diameter),
            Self::Length => Some(joint.length),
            Self::ShaftStrength => strength(joint.rings.first()?),
            Self::HubStrength => strength(joint.rings.get(1)?),
            Self::HoldingFriction => Some(joint.friction.holding.value.low),
        }
    }

    /// The joint with another value; none when it cannot have it.
    pub fn changed(self, joint: &Joint, value: f64) -> Option<Joint> {
        let mut joint = joint.clone();
        match self {
            Self::HubOuterDiameter => {
                let section_follows = joint.defaults.iter().any(|default| default.key == "hub.section");
                let hub = joint.rings.get_mut(1)?;
                hub.outer_diameter = value;
                if section_follows {
                    // The thickness of the wall is the section that picks the strength, when none is given.
                    hub.section = 0.5 * (value - hub.inner_diameter);
                    hub.strength = hub.material.strength_for(hub.section)?.clone();
                }
            }
            Self::Length => joint.length = value,
            Self::ShaftStrength => set_strength(joint.rings.first_mut()?, value),
            Self::HubStrength => set_strength(joint.rings.get_mut(1)?, value),
            Self::HoldingFriction => joint.friction.holding.value = Range { low: value, high: value },
        }
        Some(joint)
    }

    /// The ends between which it is sought: as far as a change is worth telling (common practice, no source).
    fn ends(self, joint: &Joint, present: f64) -> (f64, f64) {
        match self {
            Self::HubOuterDiameter => (1.02 * joint.diameter, 4.0 * present),
            Self::Length => (joint.relief + 0.1 * joint.engaged_length(), 4.0 * present),
            Self::ShaftStrength | Self::HubStrength => (present, 4.0 * present),
            Self::HoldingFriction => (present, 1.0),
        }
    }

    /// The steps in which it is written, with its unit.
    fn writing(self, system: UnitSystem) -> Writing {
        match (self, system) {
            (Self::HubOuterDiameter | Self::Length, UnitSystem::Metric) => {
                Writing::new(Kind::Length, 2, "mm")
            }
            (Self::HubOuterDiameter | Self::Length, UnitSystem::Inch) => Writing::new(Kind::Length, 3, "in"),
            (Self::ShaftStrength | Self::HubStrength, UnitSystem::Metric) => {
                Writing::new(Kind::Pressure, 1, "MPa")
            }
            (Self::ShaftStrength | Self::HubStrength, UnitSystem::Inch) => {
                Writing::new(Kind::Pressure, 2, "ksi")
            }
            (Self::HoldingFriction, _) => Writing::new(Kind::Number, 4, ""),
        }
    }
}

fn strength(ring: &Ring) -> Option<f64> {
    match ring.material.kind {
        MaterialKind::Brittle => ring.strength.tensile_strength,
        MaterialKind::Ductile | MaterialKind::Polymer => ring.strength.yield_strength,
    }
}

fn set_strength(ring: &mut Ring, value: f64) {
    match ring.material.kind {
        MaterialKind::Brittle => ring.strength.tensile_strength = Some(value),
        MaterialKind::Ductile | MaterialKind::Polymer => ring.strength.yield_strength = Some(value),
    }
}

/// A change of one number that lets a fit in.
#[derive(Debug, Clone, PartialEq)]
pub struct Change {
    /// The number.
    pub parameter: Parameter,
    /// Its present value, SI.
    pub from: f64,
    /// The smallest change, whatever fit it lets in.
    pub smallest: Opening,
    /// The smallest change that lets in a fit of [`WORKSHOP`] grades, when the first one does not.
    pub for_workshop: Option<Opening>,
}

/// A value of a number and the fit that it lets in.
#[derive(Debug, Clone, PartialEq)]
pub struct Opening {
    /// The value, SI; exactly that of [`Opening::written`].
    pub to: f64,
    /// The value as it would be written, rounded away from the present one.
    pub written: String,
    /// The first of the fits that then meet the requirements.
    pub lets_in: String,
    /// Finest grade of ISO 286 in that fit.
    pub finest_grade: Option<Grade>,
}

/// Number of the finest grade that is made for fits; finer ones are for gauges.
///
/// That IT01 to IT4 are for gauges and IT5 to IT11 for fits is the usual reading of ISO 286 in textbooks, from
/// memory.
pub const WORKSHOP: u8 = 5;

/// How a number is written: so many decimals of a unit.
#[derive(Debug, Clone, Copy)]
struct Writing {
    kind: Kind,
    decimals: usize,
    unit: &'static str,
}

impl Writing {
    fn new(kind: Kind, decimals: usize, unit: &'static str) -> Self {
        Self { kind, decimals, unit }
    }

    /// The text of a whole number of steps, and the SI number that it means.
    fn steps(&self, count: f64) -> Option<(String, f64)> {
        let number = count / 10f64.powi(self.decimals as i32);
        let text = format!("{number:.*} {}", self.decimals, self.unit);
        let text = text.trim_end().to_owned();
        let value = parse(self.kind, &text).ok()?;
        Some((text, value))
    }

    /// How many steps a number is, rounded away from the present value.
    fn count(&self, value: f64, upwards: bool) -> Option<f64> {
        let one = self.steps(1.0)?.1;
        let count = value / one;
        Some(if upwards { (count - 1e-9).ceil() } else { (count + 1e-9).floor() })
    }
}

/// Ratio of two neighbouring values while a change of sign is sought.
const STEP: f64 = 1.02;

/// Fits to let in, with those among them that come first into any window.
#[derive(Debug, Clone)]
pub(super) struct Wanted {
    candidates: Candidates,
    narrowest: Vec<Candidate>,
}

impl Wanted {
    pub(super) fn of(candidates: Candidates) -> Self {
        Self { narrowest: narrowest(&candidates), candidates }
    }

    /// The fit that lies deepest in a window, or the least outside it.
    pub(super) fn nearest(&self, window: &Window) -> Option<Candidate> {
        let margin = |fit: &Candidate| window.margin(fit.loosest, fit.tightest);
        self.narrowest.iter().copied().max_by(|a, b| margin(a).total_cmp(&margin(b)))
    }
}

/// The smallest change of each number that lets a fit in, where there is one.
pub(super) fn changes(
    joint: &Joint,
    any: &Wanted,
    workshop: Option<&Wanted>,
) -> Result<Vec<Change>, ChooseError> {
    let mut changes = Vec::new();
    for parameter in Parameter::ALL {
        let Some(present) = parameter.of(joint) else { continue };
        let search = |wanted| Search { joint, wanted, parameter, present }.smallest();
        let Some(smallest) = search(any)? else { continue };
        let fine = smallest.finest_grade < Grade::numbered(WORKSHOP);
        let for_workshop = match workshop {
            Some(workshop) if fine => search(workshop)?,
            _ => None,
        };
        changes.push(Change { parameter, from: present, smallest, for_workshop });
    }
    Ok(changes)
}

struct Search<'a> {
    joint: &'a Joint,
    wanted: &'a Wanted,
    parameter: Parameter,
    present: f64,
}

impl Search<'_> {
    /// The smaller of the change upwards and the change downwards.
    fn smallest(&self) -> Result<Option<Opening>, ChooseError> {
        let (low, high) = self.parameter.ends(self.joint, self.present);
        let ways = [self.towards(high)?, self.towards(low)?];
        let size = |opening: &Opening| (opening.to / self.present).ln().abs();
        Ok(ways.into_iter().flatten().min_by(|a, b| size(a).total_cmp(&size(b))))
    }

    /// The first change that lets a fit in on the way to an end.
    fn towards(&self, end: f64) -> Result<Option<Opening>, ChooseError> {
        let upwards = end > self.present;
        let factor = if upwards { STEP } else { 1.0 / STEP };
        let within = |value: f64| if upwards { value <= end } else { value >= end };
        let (mut closed, mut next) = (self.present, self.present * factor);
        while within(next) {
            if self.depth(next) >= 0.0 {
                let root = bracketed(|value| self.depth(value), closed, next, 1e-10 * next).unwrap_or(next);
                return self.written(root, upwards);
            }
            (closed, next) = (next, next * factor);
        }
        Ok(None)
    }

    /// How deep the best fit lies in the window of the changed joint, m; negative when it lies outside.
    fn depth(&self, value: f64) -> f64 {
        const OUTSIDE: f64 = -1.0;
        let Some(joint) = self.parameter.changed(self.joint, value) else { return OUTSIDE };
        let Ok(judge) = Judge::of(&joint) else { return OUTSIDE };
        let window = Judge::window(&judge.requirements());
        let margins = self.wanted.narrowest.iter().map(|fit| window.margin(fit.loosest, fit.tightest));
        margins.fold(OUTSIDE, f64::max).min(1.0)
    }

    /// The root as it would be written, with the search run again.
    fn written(&self, root: f64, upwards: bool) -> Result<Option<Opening>, ChooseError> {
        let writing = self.parameter.writing(self.joint.display);
        let Some(first) = writing.count(root, upwards) else { return Ok(None) };
        for further in 0..3 {
            let count = if upwards { first + f64::from(further) } else { first - f64::from(further) };
            let Some((written, to)) = writing.steps(count) else { continue };
            let Some(joint) = self.parameter.changed(self.joint, to) else { continue };
            let first = Rules::of(&joint)?.first(&self.wanted.candidates);
            if let Some(ChosenFit { callout: lets_in, finest_grade, .. }) = first {
                return Ok(Some(Opening { to, written, lets_in, finest_grade }));
            }
        }
        Ok(None)
    }
}
