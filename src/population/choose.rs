//! Which standard fits meet the requirements of a joint, the cheapest first.
//!
//! Every pair of classes that the standard defines at the diameter is held against the allowed window of
//! interference; those inside are evaluated in full at both extremes. A bearing ring has its limits from ISO 492, so
//! there the classes of its seat alone are gone through. When no fit is left, [`Choice::changes`] says by how little
//! one dimension, strength or friction would have to change to let one in.

mod candidate;
mod change;
pub(in crate::population) mod judge;
mod ranking;
mod seat;
mod timing;

use std::cmp::Ordering;

use thiserror::Error;

use crate::joint::Joint;
use crate::tolerance::iso286::Grade;
use crate::tolerance::{FitLimits, ToleranceError};

use super::kernel::KernelError;
use candidate::Candidates;
pub use candidate::{Basis, Standard};
use change::Wanted;
pub use change::{Change, Opening, Parameter, WORKSHOP};
use judge::{Judge, Made};
pub use judge::{Requirement, Subject, Window};
use ranking::{Ranked, Rules};
pub use seat::SeatEffect;
pub use timing::Progress;

/// Which fits are gone through.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Options {
    /// The standard.
    pub standard: Standard,
    /// Of ISO 286 no grade finer than this; none lets every grade in.
    pub finest: Option<Grade>,
}

/// Why no fit could be chosen.
#[derive(Debug, Clone, PartialEq, Error)]
pub enum ChooseError {
    /// Without a load every fit holds.
    #[error("no service state loads the joint, so nothing says how tight the fit must be")]
    NoLoad,
    /// The limits of a bearing ring are in one standard only.
    #[error(
        "the bearing ring has its limits from ISO 492, which goes with seats of ISO 286, not with ANSI B4.1"
    )]
    RingByIso,
    /// The joint is not one that the kernel evaluates.
    #[error(transparent)]
    Kernel(#[from] KernelError),
    /// The diameter is outside the standard.
    #[error(transparent)]
    Tolerance(#[from] ToleranceError),
}

/// The fits that meet the requirements, or what stands in the way.
#[derive(Debug, Clone, PartialEq)]
pub struct Choice {
    /// The joint; its own fit, if it has one, is judged in [`Choice::given`].
    pub joint: Joint,
    /// What was gone through.
    pub options: Options,
    /// How many fits were gone through.
    pub considered: usize,
    /// Every requirement with its edge; last the handling time, which has none, where it is required.
    pub requirements: Vec<Requirement>,
    /// The interferences that meet them all.
    pub window: Window,
    /// The fits that meet them all: the lowest relative cost first, then preferred ones, then hole basis before
    /// shaft basis before mixed, then the wider margin.
    pub fits: Vec<ChosenFit>,
    /// How many fits meet everything but the time from oven or bath to seated.
    pub short_of_time: usize,
    /// The fit written in the joint file.
    pub given: Option<ChosenFit>,
    /// When no fit meets them: the one that comes nearest, of grade IT5 or coarser; where the handling time alone
    /// leaves none, the one with the longest time.
    pub nearest: Option<ChosenFit>,
    /// When no fit meets them: the smallest changes that let one in. None are sought where the handling time alone
    /// leaves no fit.
    pub changes: Vec<Change>,
}

/// A fit with what it gives.
#[derive(Debug, Clone, PartialEq)]
pub struct ChosenFit {
    /// The fit as written in a joint file.
    pub callout: String,
    /// Limits of both members.
    pub limits: FitLimits,
    /// Interference of the loosest pair, m.
    pub loosest: f64,
    /// Interference of the tightest pair, m.
    pub tightest: f64,
    /// Which member is the basis; none for a fit that names no classes, and for a seat, whose ring is no choice.
    pub basis: Option<Basis>,
    /// The standards that prefer it.
    pub preferred_by: Vec<&'static str>,
    /// Finest grade of ISO 286 in it.
    pub finest_grade: Option<Grade>,
    /// Cost of making it relative to H7 with a shaft of grade 6, of a seat relative to that member alone; none when a
    /// limit has no width.
    pub relative_cost: Option<f64>,
    /// What it gives for each requirement, in their order: found, and whether that is enough.
    pub found: Vec<(Option<f64>, bool)>,
    /// Interference of the loosest pair above the least, m; negative when it is not enough.
    pub margin_below: f64,
    /// Interference of the tightest pair below the greatest, m; none when nothing limits it.
    pub margin_above: Option<f64>,
    /// What it does to the bearing, when a ring of one is fitted.
    pub seat: Option<SeatEffect>,
    /// Why the full computation refuses it; such a fit meets nothing.
    pub refused: Option<String>,
}

impl ChosenFit {
    /// Whether it meets every requirement.
    pub fn meets_all(&self) -> bool {
        self.refused.is_none() && self.found.iter().all(|(_, ok)| *ok)
    }

    /// The smaller of its two margins, m.
    pub fn least_margin(&self) -> f64 {
        self.margin_above.map_or(self.margin_below, |above| self.margin_below.min(above))
    }

    /// What a user of its classes should know; full sentences.
    pub fn remarks(&self) -> Vec<String> {
        candidate::remarks(&self.callout, self.limits.nominal)
    }
}

/// The fits of a standard that meet the requirements of a joint.
///
/// # Errors
/// [`ChooseError`]; that no fit meets them is a result, not an error.
///
/// # Example
/// ```
/// use std::path::Path;
/// use hubgrip::joint::read;
/// use hubgrip::material::library::Library;
/// use hubgrip::population::choose::{Options, Standard, choose};
///
/// let text = b"\
/// joint_file: 1
/// diameter: 60 mm
/// length: 70 mm
/// shaft: {material: C45+N}
/// hub: {material: C45+N, outer_diameter: 120 mm}
/// friction: 0.12
/// duty: [{state: rated, torque: 300 N.m}]
/// ";
/// let joint = read::read_without_fit(text, Path::new("joint.yaml"), &[], &Library::built_in()).unwrap();
/// let choice = choose(joint, Options { standard: Standard::Iso286, finest: None }).unwrap();
/// assert!(choice.fits.iter().any(|fit| fit.callout == "H7/s6"));
/// assert!(choice.fits.iter().all(|fit| fit.loosest >= choice.window.least));
/// ```
pub fn choose(joint: Joint, options: Options) -> Result<Choice, ChooseError> {
    choose_telling(joint, options, &|_, _| ())
}

/// As [`choose`], telling how far it has come; only where the handling time is required does it take long enough.
///
/// # Errors
/// As [`choose`].
pub fn choose_telling(joint: Joint, options: Options, progress: Progress<'_>) -> Result<Choice, ChooseError> {
    let rules = Rules::of(&joint)?;
    if !rules.requirements.iter().any(|wanted| wanted.subject.is_of_holding()) {
        return Err(ChooseError::NoLoad);
    }
    let candidates = Candidates::of(&joint, options.standard, options.finest)?;
    let Ranked { fits, short_of_time } = rules.ranked(&candidates, progress);
    let given = joint.fits.first().map(|fit| rules.written(fit));
    let considered = candidates.count();
    let (nearest, changes) = match short_of_time.iter().max_by(|a, b| by_time(a, b)) {
        _ if !fits.is_empty() => (None, Vec::new()),
        Some(longest) => (Some(longest.clone()), Vec::new()),
        None => {
            let workshop = workshop(&joint, options)?;
            let any = Wanted::of(candidates);
            let nearest = workshop.as_ref().unwrap_or(&any).nearest(&rules.window);
            let nearest = nearest.map(|nearest| rules.evaluated_in_full(nearest));
            (nearest, change::changes(&joint, &any, workshop.as_ref())?)
        }
    };
    let (requirements, window) = (rules.requirements, rules.window);
    let short_of_time = short_of_time.len();
    Ok(Choice {
        considered,
        options,
        requirements,
        window,
        fits,
        short_of_time,
        given,
        nearest,
        changes,
        joint,
    })
}

/// The order of fits by how much time they leave.
fn by_time(a: &ChosenFit, b: &ChosenFit) -> Ordering {
    let time = |fit: &ChosenFit| fit.found.last().and_then(|(found, _)| *found).unwrap_or(0.0);
    time(a).total_cmp(&time(b))
}

/// The fits of grades that are made for fits, when the options let finer ones in as well.
fn workshop(joint: &Joint, options: Options) -> Result<Option<Wanted>, ChooseError> {
    let grade = Grade::numbered(WORKSHOP);
    if options.standard != Standard::Iso286 || options.finest >= grade {
        return Ok(None);
    }
    Ok(Some(Wanted::of(Candidates::of(joint, options.standard, grade)?)))
}

impl Choice {
    /// The requirement that sets the least interference, and the one that sets the greatest.
    pub fn binding(&self) -> (Option<&Requirement>, Option<&Requirement>) {
        let least = self.requirements.iter().find(|wanted| wanted.least == Some(self.window.least));
        let greatest = self.window.greatest;
        let above = self.requirements.iter().find(|wanted| greatest.is_some() && wanted.greatest == greatest);
        (least, above)
    }

    /// What a fit without tolerance of this interference as made (m) gives for a requirement.
    ///
    /// # Errors
    /// As [`choose`].
    pub fn found_at(&self, requirement: &Requirement, made: f64) -> Result<Option<f64>, ChooseError> {
        let made = Made { loosest: made, tightest: made };
        Ok(Judge::of(&self.joint)?.found(requirement.subject, made))
    }
}
