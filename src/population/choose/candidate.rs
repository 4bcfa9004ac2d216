//! The fits to choose from: every pair of classes that a standard defines at the diameter, or every class of the seat
//! of a bearing ring.

use std::fmt;

use super::ChooseError;
use crate::joint::{BearingSeat, Joint};
use crate::tolerance::ansi_b4_1::{self, AnsiClass};
use crate::tolerance::iso286::{
    Grade, Letter, PREFERRED_FITS_ANSI_B4_2, PREFERRED_FITS_ISO_286_1, PreferredFit, ToleranceClass,
    defined_classes, it_grade,
};
use crate::tolerance::{FitCallout, FitLimits, Limits, Member, MemberCallout, ToleranceError};

/// Standard whose fits are gone through.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Standard {
    /// ISO 286: every hole class with every shaft class.
    Iso286,
    /// ANSI B4.1: every class of the five series.
    AnsiB4_1,
}

/// Which member is the basis of a fit (ISO 286-1, clause 3.4): mixed when neither is H or h.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub enum Basis {
    /// The hole is an H hole.
    Hole,
    /// The shaft is an h shaft.
    Shaft,
    /// Neither is: special tools and gauges for both.
    Mixed,
}

/// A hole or a shaft class with its limits.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct MemberClass {
    pub(super) class: ToleranceClass,
    pub(super) limits: Limits,
    /// Share of this member in the relative cost.
    pub(super) cost: f64,
}

/// A fit to choose from.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Candidate {
    pub(super) name: Name,
    pub(super) limits: FitLimits,
    pub(super) loosest: f64,
    pub(super) tightest: f64,
    pub(super) cost: f64,
}

/// How a fit is called.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Name {
    Iso {
        hole: ToleranceClass,
        shaft: ToleranceClass,
    },
    Ansi(AnsiClass),
    /// The member that a bearing ring sits on or in.
    Seat(ToleranceClass),
}

impl fmt::Display for Name {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match *self {
            Self::Iso { hole, shaft } => FitCallout::Iso { hole, shaft }.fmt(f),
            Self::Ansi(class) => FitCallout::Ansi(class).fmt(f),
            Self::Seat(class) => class.fmt(f),
        }
    }
}

impl Name {
    pub(super) fn basis(self) -> Option<Basis> {
        match self {
            Self::Iso { hole, .. } if hole.letter == Letter::H => Some(Basis::Hole),
            Self::Iso { shaft, .. } if shaft.letter == Letter::H => Some(Basis::Shaft),
            Self::Iso { .. } => Some(Basis::Mixed),
            Self::Ansi(_) => Some(Basis::Hole),
            Self::Seat(_) => None,
        }
    }

    /// The standards that prefer it.
    pub(super) fn preferred_by(self) -> Vec<&'static str> {
        let Self::Iso { hole, shaft } = self else { return Vec::new() };
        let among = |fits: &[PreferredFit]| fits.iter().any(|fit| fit.hole == hole && fit.shaft == shaft);
        [("ISO 286-1", among(&PREFERRED_FITS_ISO_286_1)), ("ANSI B4.2", among(&PREFERRED_FITS_ANSI_B4_2))]
            .into_iter()
            .filter_map(|(standard, prefers)| prefers.then_some(standard))
            .collect()
    }

    /// The finest grade in it; none for ANSI B4.1, whose classes name no grades.
    pub(super) fn finest_grade(self) -> Option<Grade> {
        match self {
            Self::Iso { hole, shaft } => Some(hole.grade.min(shaft.grade)),
            Self::Seat(class) => Some(class.grade),
            Self::Ansi(_) => None,
        }
    }
}

/// All fits of a standard at one diameter.
#[derive(Debug, Clone)]
pub(super) struct Candidates {
    nominal: f64,
    holes: Vec<MemberClass>,
    shafts: Vec<MemberClass>,
    /// Fits that are not made up of a hole and a shaft class.
    single: Vec<Candidate>,
}

impl Candidates {
    /// The fits defined at the diameter of a joint; of ISO 286 none with a grade finer than `finest`.
    pub(super) fn of(joint: &Joint, standard: Standard, finest: Option<Grade>) -> Result<Self, ChooseError> {
        let nominal = joint.diameter;
        let cost = Cost::at(nominal)?;
        let mut candidates = Self { nominal, holes: Vec::new(), shafts: Vec::new(), single: Vec::new() };
        match (standard, &joint.bearing) {
            (Standard::Iso286, Some(seat)) => candidates.single = seats(seat, nominal, finest, &cost)?,
            (Standard::AnsiB4_1, Some(_)) => return Err(ChooseError::RingByIso),
            (Standard::Iso286, None) => {
                candidates.holes = member_classes(Member::Hole, nominal, finest, &cost)?;
                candidates.shafts = member_classes(Member::Shaft, nominal, finest, &cost)?;
            }
            (Standard::AnsiB4_1, None) => {
                for class in ansi_b4_1::defined_classes(nominal)? {
                    let limits = class.limits(nominal)?;
                    let name = Name::Ansi(class);
                    candidates.single.push(candidate(name, limits, cost.of_limits(&limits)));
                }
            }
        }
        Ok(candidates)
    }

    /// How many there are.
    pub(super) fn count(&self) -> usize {
        self.holes.len() * self.shafts.len() + self.single.len()
    }

    /// Every fit, those of ISO 286 by hole, then by shaft.
    pub(super) fn iter(&self) -> impl Iterator<Item = Candidate> + '_ {
        let iso = self.holes.iter().flat_map(move |hole| {
            self.shafts.iter().map(move |shaft| {
                let limits = FitLimits { nominal: self.nominal, hole: hole.limits, shaft: shaft.limits };
                let name = Name::Iso { hole: hole.class, shaft: shaft.class };
                candidate(name, limits, hole.cost + shaft.cost)
            })
        });
        iso.chain(self.single.iter().copied())
    }
}

fn candidate(name: Name, limits: FitLimits, cost: f64) -> Candidate {
    let interference = limits.interference();
    Candidate { name, limits, loosest: interference.loosest, tightest: interference.tightest, cost }
}

/// Every class of the member that carries a bearing ring, with the ring's own limits beside it.
fn seats(
    seat: &BearingSeat,
    nominal: f64,
    finest: Option<Grade>,
    cost: &Cost,
) -> Result<Vec<Candidate>, ToleranceError> {
    let made = seat.member().other();
    let of = |class: &MemberClass| {
        let (hole, shaft) = match made {
            Member::Hole => (class.limits, seat.limits.value),
            Member::Shaft => (seat.limits.value, class.limits),
        };
        candidate(Name::Seat(class.class), FitLimits { nominal, hole, shaft }, 2.0 * class.cost)
    };
    Ok(member_classes(made, nominal, finest, cost)?.iter().map(of).collect())
}

fn member_classes(
    member: Member,
    nominal: f64,
    finest: Option<Grade>,
    cost: &Cost,
) -> Result<Vec<MemberClass>, ToleranceError> {
    let classes = defined_classes(member, nominal)?;
    let wanted = classes.into_iter().filter(|class| finest.is_none_or(|finest| class.grade >= finest));
    wanted
        .map(|class| {
            let limits = class.limits(nominal)?;
            Ok(MemberClass { class, limits, cost: cost.of_member(member, &limits) })
        })
        .collect()
}

/// Relative cost of making a fit: the tolerance IT7 over that of the hole, and IT6 over that of the shaft, half
/// each, so that H7 with a shaft of grade 6 costs 1.
///
/// C = ½ (IT7/T_hole + IT6/T_shaft), with the grades of ISO 286-1 at the nominal size.
///
/// That cost falls as the reciprocal of the tolerance is the simplest of the published cost-tolerance models
/// (K. W. Chase and W. H. Greenwood, *Design Issues in Mechanical Tolerance Analysis*, Manufacturing Review 1
/// (1988) 50–59, from memory). That a hole costs as much as a shaft one grade finer, and both count alike:
/// common practice, no source. It orders fits; it is no price.
#[derive(Debug, Clone, Copy)]
struct Cost {
    it7: f64,
    it6: f64,
}

impl Cost {
    fn at(nominal: f64) -> Result<Self, ToleranceError> {
        let width = |number: u8| match Grade::numbered(number) {
            Some(grade) => it_grade(grade, nominal),
            None => Ok(f64::NAN),
        };
        Ok(Self { it7: width(7)?, it6: width(6)? })
    }

    fn of_member(&self, member: Member, limits: &Limits) -> f64 {
        match member {
            Member::Hole => 0.5 * self.it7 / limits.width(),
            Member::Shaft => 0.5 * self.it6 / limits.width(),
        }
    }

    fn of_limits(&self, limits: &FitLimits) -> f64 {
        self.of_member(Member::Hole, &limits.hole) + self.of_member(Member::Shaft, &limits.shaft)
    }
}

/// Relative cost of given limits, by the same rule, of a seat for the member that is made; none where ISO 286 has no
/// grades or a limit has no width.
pub(super) fn cost_of(limits: &FitLimits, seat: Option<&BearingSeat>) -> Option<f64> {
    let cost = Cost::at(limits.nominal).ok()?;
    let cost = match seat.map(|seat| seat.member().other()) {
        None => cost.of_limits(limits),
        Some(Member::Hole) => 2.0 * cost.of_member(Member::Hole, &limits.hole),
        Some(Member::Shaft) => 2.0 * cost.of_member(Member::Shaft, &limits.shaft),
    };
    Some(cost).filter(|cost| cost.is_finite())
}

/// The fits with the narrowest band at each place: every other fit has one of these between its extremes.
///
/// From the tightest loosest pair downwards, each has a smaller tightest pair than all before it.
pub(super) fn narrowest(candidates: &Candidates) -> Vec<Candidate> {
    let mut all: Vec<Candidate> = candidates.iter().collect();
    all.sort_by(|a, b| b.loosest.total_cmp(&a.loosest).then(a.tightest.total_cmp(&b.tightest)));
    let mut kept: Vec<Candidate> = Vec::new();
    for candidate in all {
        if kept.last().is_none_or(|last| candidate.tightest < last.tightest) {
            kept.push(candidate);
        }
    }
    kept
}

/// The name of a callout that names classes.
pub(super) fn name_of(callout: &str) -> Option<Name> {
    match FitCallout::parse(callout) {
        Ok(FitCallout::Iso { hole, shaft }) => Some(Name::Iso { hole, shaft }),
        Ok(FitCallout::Ansi(class)) => Some(Name::Ansi(class)),
        _ => member_of(callout).map(|(_, class)| Name::Seat(class)),
    }
}

/// The one member that a callout such as `k6` names.
fn member_of(callout: &str) -> Option<(Member, ToleranceClass)> {
    [Member::Hole, Member::Shaft].into_iter().find_map(|member| match MemberCallout::parse(callout, member) {
        Ok(MemberCallout::Class(class)) => Some((member, class)),
        _ => None,
    })
}

/// What a user of the classes of a callout should know; full sentences.
pub(super) fn remarks(callout: &str, nominal: f64) -> Vec<String> {
    let fit = FitCallout::parse(callout).and_then(|fit| fit.resolve(nominal)).map(|fit| fit.remarks);
    let member = || {
        let (member, class) = member_of(callout)?;
        Some(MemberCallout::Class(class).resolve(member, nominal).ok()?.remarks)
    };
    fit.ok().or_else(member).unwrap_or_default()
}
