//! Which standard fits meet the requirements of a joint, the cheapest first.
//!
//! Every pair of classes that the standard defines at the diameter is held against the allowed window of
//! interference; those inside are evaluated in full at both extremes. When no fit is left, [`Choice::changes`]
//! says by how little one dimension, strength or friction would have to change to let one in.

mod candidate;
mod change;
pub(in crate::population) mod judge;

use thiserror::Error;

use crate::findings::{self, FindingsError};
use crate::joint::{Fit, Joint};
use crate::tolerance::iso286::Grade;
use crate::tolerance::{FitCallout, FitLimits, ToleranceError};

use super::kernel::KernelError;
pub use candidate::{Basis, Standard};
use candidate::{Candidate, Candidates};
use change::Wanted;
pub use change::{Change, Opening, Parameter, WORKSHOP};
use judge::{Judge, Made};
pub use judge::{Requirement, Subject, Window};

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
    #[error("no service state has a torque or an axial force, so nothing says how tight the fit must be")]
    NoLoad,
    /// The joint is not one that the kernel evaluates.
    #[error(transparent)]
    Kernel(#[from] KernelError),
    /// The diameter is outside the standard.
    #[error(transparent)]
    Tolerance(#[from] ToleranceError),
    /// The full computation was refused.
    #[error(transparent)]
    Findings(#[from] FindingsError),
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
    /// Every requirement with its edge.
    pub requirements: Vec<Requirement>,
    /// The interferences that meet them all.
    pub window: Window,
    /// The fits that meet them all: the lowest relative cost first, then preferred ones, then hole basis before
    /// shaft basis before mixed, then the wider margin.
    pub fits: Vec<ChosenFit>,
    /// The fit written in the joint file.
    pub given: Option<ChosenFit>,
    /// When no fit meets them: the one that comes nearest, of grade IT5 or coarser.
    pub nearest: Option<ChosenFit>,
    /// When no fit meets them: the smallest changes that let one in.
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
    /// Which member is the basis; none for a fit that names no classes.
    pub basis: Option<Basis>,
    /// The standards that prefer it.
    pub preferred_by: Vec<&'static str>,
    /// Finest grade of ISO 286 in it.
    pub finest_grade: Option<Grade>,
    /// Cost of making it relative to H7 with a shaft of grade 6; none when a limit has no width.
    pub relative_cost: Option<f64>,
    /// What it gives for each requirement, in their order: found, and whether that is enough.
    pub found: Vec<(Option<f64>, bool)>,
    /// Interference of the loosest pair above the least, m; negative when it is not enough.
    pub margin_below: f64,
    /// Interference of the tightest pair below the greatest, m; none when nothing limits it.
    pub margin_above: Option<f64>,
}

impl ChosenFit {
    /// Whether it meets every requirement.
    pub fn meets_all(&self) -> bool {
        self.found.iter().all(|(_, ok)| *ok)
    }

    /// The smaller of its two margins, m.
    pub fn least_margin(&self) -> f64 {
        self.margin_above.map_or(self.margin_below, |above| self.margin_below.min(above))
    }

    /// What a user of its classes should know; full sentences.
    pub fn remarks(&self) -> Vec<String> {
        let resolved = FitCallout::parse(&self.callout).and_then(|fit| fit.resolve(self.limits.nominal));
        resolved.map(|resolved| resolved.remarks).unwrap_or_default()
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
    if joint.duty.iter().all(|state| state.torque == 0.0 && state.axial_force == 0.0) {
        return Err(ChooseError::NoLoad);
    }
    let candidates = Candidates::at(joint.diameter, options.standard, options.finest)?;
    let judge = Judge::of(&joint)?;
    let requirements = judge.requirements();
    let window = Judge::window(&requirements);
    let fits = ranked(&judge, &requirements, &window, &candidates)?;
    let given = match joint.fits.first() {
        Some(fit) => Some(written_fit(&judge, &requirements, &window, fit)?),
        None => None,
    };
    let considered = candidates.count();
    let (nearest, changes) = if fits.is_empty() {
        let workshop = workshop(&joint, options)?;
        let any = Wanted::of(candidates);
        let nearest = workshop.as_ref().unwrap_or(&any).nearest(&window);
        let nearest =
            nearest.map(|nearest| evaluated(&judge, &requirements, &window, nearest)).transpose()?;
        (nearest, change::changes(&joint, &any, workshop.as_ref())?)
    } else {
        (None, Vec::new())
    };
    Ok(Choice { considered, options, requirements, window, fits, given, nearest, changes, joint })
}

/// The fits of grades that are made for fits, when the options let finer ones in as well.
fn workshop(joint: &Joint, options: Options) -> Result<Option<Wanted>, ChooseError> {
    let grade = Grade::numbered(WORKSHOP);
    if options.standard != Standard::Iso286 || options.finest >= grade {
        return Ok(None);
    }
    Ok(Some(Wanted::of(Candidates::at(joint.diameter, options.standard, grade)?)))
}

/// The fits that meet all requirements, best first.
fn ranked(
    judge: &Judge<'_>,
    requirements: &[Requirement],
    window: &Window,
    candidates: &Candidates,
) -> Result<Vec<ChosenFit>, ChooseError> {
    // A rounding beyond the edge is let through to be judged in full.
    let slack = 1e-15;
    let near =
        Window { least: window.least - slack, greatest: window.greatest.map(|greatest| greatest + slack) };
    let mut fits = Vec::new();
    for candidate in candidates.iter().filter(|candidate| near.holds(candidate.loosest, candidate.tightest)) {
        let fit = evaluated(judge, requirements, window, candidate)?;
        if fit.meets_all() {
            fits.push((candidate, fit));
        }
    }
    fits.sort_by(|(a, a_fit), (b, b_fit)| {
        let plain = |fit: &ChosenFit| fit.preferred_by.is_empty();
        a.cost
            .total_cmp(&b.cost)
            .then(plain(a_fit).cmp(&plain(b_fit)))
            .then(a_fit.basis.cmp(&b_fit.basis))
            .then(b_fit.least_margin().total_cmp(&a_fit.least_margin()))
    });
    Ok(fits.into_iter().map(|(_, fit)| fit).collect())
}

fn evaluated(
    judge: &Judge<'_>,
    requirements: &[Requirement],
    window: &Window,
    candidate: Candidate,
) -> Result<ChosenFit, ChooseError> {
    let callout = candidate.name.callout().to_string();
    let found = found(judge, requirements, &callout, &candidate.limits)?;
    Ok(ChosenFit {
        callout,
        limits: candidate.limits,
        loosest: candidate.loosest,
        tightest: candidate.tightest,
        basis: Some(candidate.name.basis()),
        preferred_by: candidate.name.preferred_by(),
        finest_grade: candidate.name.finest_grade(),
        relative_cost: Some(candidate.cost),
        found,
        margin_below: candidate.loosest - window.least,
        margin_above: window.greatest.map(|greatest| greatest - candidate.tightest),
    })
}

/// The fit of the joint file.
fn written_fit(
    judge: &Judge<'_>,
    requirements: &[Requirement],
    window: &Window,
    fit: &Fit,
) -> Result<ChosenFit, ChooseError> {
    let interference = fit.limits.interference();
    let name = candidate::name_of(&fit.callout);
    Ok(ChosenFit {
        callout: fit.callout.clone(),
        limits: fit.limits,
        loosest: interference.loosest,
        tightest: interference.tightest,
        basis: name.map(candidate::Name::basis),
        preferred_by: name.map(candidate::Name::preferred_by).unwrap_or_default(),
        finest_grade: name.and_then(candidate::Name::finest_grade),
        relative_cost: candidate::cost_of(&fit.limits),
        found: found(judge, requirements, &fit.callout, &fit.limits)?,
        margin_below: interference.loosest - window.least,
        margin_above: window.greatest.map(|greatest| greatest - interference.tightest),
    })
}

/// A found number this close to the required one is judged by the full computation, whose rounding counts.
const CLOSE: f64 = 1e-11;

/// What a fit gives for each requirement, and whether that is enough.
fn found(
    judge: &Judge<'_>,
    requirements: &[Requirement],
    callout: &str,
    limits: &FitLimits,
) -> Result<Vec<(Option<f64>, bool)>, ChooseError> {
    let interference = limits.interference();
    let made = Made { loosest: interference.loosest, tightest: interference.tightest };
    let mut found: Vec<(Option<f64>, bool)> = requirements
        .iter()
        .map(|requirement| (judge.found(requirement.subject, made), judge.meets(requirement.subject, made)))
        .collect();
    let close = requirements.iter().zip(&found).any(|(requirement, (found, _))| {
        matches!((found, requirement.required), (Some(found), Some(required))
            if (found - required).abs() <= CLOSE * required.abs())
    });
    if close {
        let fit = Fit { callout: callout.to_owned(), limits: *limits, source: String::new() };
        let full = findings::compute(Joint { fits: vec![fit], ..judge.joint().clone() })?;
        // The verdicts stand in the order of the requirements, save that a press without a limit has one more.
        for ((_, ok), verdict) in found.iter_mut().zip(&full.verdicts) {
            *ok = verdict.ok;
        }
    }
    Ok(found)
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
