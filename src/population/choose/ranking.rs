//! Fits held against the requirements, and put in order.

use super::candidate::{self, Candidate, Candidates};
use super::judge::{Judge, Made, Requirement, Subject, Window};
use super::seat::SeatEffect;
use super::timing::{Progress, Timing};
use super::{ChooseError, ChosenFit};
use crate::findings::{self, Question, Verdict, VerdictUnit};
use crate::joint::{Fit, Joint};
use crate::tolerance::FitLimits;

/// What a fit must meet.
#[derive(Debug, Clone)]
pub(super) struct Rules<'a> {
    joint: &'a Joint,
    judge: Judge<'a>,
    timing: Option<Timing<'a>>,
    /// All of them; the handling time last.
    pub(super) requirements: Vec<Requirement>,
    /// What those with edges leave.
    pub(super) window: Window,
}

/// The fits that meet all requirements, and those that meet all but the handling time, both best first.
#[derive(Debug, Clone, Default)]
pub(super) struct Ranked {
    pub(super) fits: Vec<ChosenFit>,
    pub(super) short_of_time: Vec<ChosenFit>,
}

/// A found number this close to the required one is judged by the full computation, whose rounding counts.
const CLOSE: f64 = 1e-11;

impl<'a> Rules<'a> {
    pub(super) fn of(joint: &'a Joint) -> Result<Self, ChooseError> {
        let judge = Judge::of(joint)?;
        let mut requirements = judge.requirements();
        let window = Judge::window(&requirements);
        let required = judge.handling_time();
        requirements.extend(required.map(|_| Requirement {
            subject: Subject::HandlingTime,
            required,
            least: None,
            greatest: None,
            never_met: false,
        }));
        let timing = required.map(|required| Timing::new(joint, required));
        Ok(Self { joint, judge, timing, requirements, window })
    }

    /// All fits that meet the requirements.
    pub(super) fn ranked(&self, candidates: &Candidates, progress: Progress<'_>) -> Ranked {
        let mut fits = self.within(candidates);
        if let Some(timing) = &self.timing {
            let limits: Vec<FitLimits> = fits.iter().map(|fit| fit.limits).collect();
            for (fit, found) in fits.iter_mut().zip(timing.of_all(&limits, progress)) {
                fit.found.push(found);
            }
        }
        let (mut fits, short_of_time): (Vec<_>, Vec<_>) = fits.into_iter().partition(ChosenFit::meets_all);
        for fit in &mut fits {
            fit.seat = SeatEffect::of(self.joint, &fit.limits);
        }
        Ranked { fits, short_of_time }
    }

    /// The first of the fits that meet the requirements; no more of them are worked out than it takes.
    pub(super) fn first(&self, candidates: &Candidates) -> Option<ChosenFit> {
        self.within(candidates).into_iter().map(|fit| self.timed(fit)).find(ChosenFit::meets_all)
    }

    /// A fit that need not meet anything.
    pub(super) fn evaluated_in_full(&self, candidate: Candidate) -> ChosenFit {
        let fit = self.timed(self.evaluated(&candidate));
        ChosenFit { seat: SeatEffect::of(self.joint, &fit.limits), ..fit }
    }

    /// The fit of the joint file.
    pub(super) fn written(&self, fit: &Fit) -> ChosenFit {
        let name = candidate::name_of(&fit.callout);
        let seat = self.joint.bearing.as_ref();
        let bare = self.chosen(fit.callout.clone(), fit.limits);
        self.timed(ChosenFit {
            basis: name.and_then(candidate::Name::basis),
            preferred_by: name.map(candidate::Name::preferred_by).unwrap_or_default(),
            finest_grade: name.and_then(candidate::Name::finest_grade),
            relative_cost: candidate::cost_of(&fit.limits, seat),
            seat: SeatEffect::of(self.joint, &fit.limits),
            ..bare
        })
    }

    /// The fits within the window that meet all that has edges, best first.
    fn within(&self, candidates: &Candidates) -> Vec<ChosenFit> {
        // A rounding beyond the edge is let through to be judged in full.
        let slack = 1e-15;
        let near = Window {
            least: self.window.least - slack,
            greatest: self.window.greatest.map(|greatest| greatest + slack),
        };
        let inside = candidates.iter().filter(|fit| near.holds(fit.loosest, fit.tightest));
        let mut fits: Vec<(f64, ChosenFit)> = inside
            .map(|candidate| (candidate.cost, self.evaluated(&candidate)))
            .filter(|(_, fit)| fit.meets_all())
            .collect();
        fits.sort_by(|(a_cost, a), (b_cost, b)| {
            let plain = |fit: &ChosenFit| fit.preferred_by.is_empty();
            a_cost
                .total_cmp(b_cost)
                .then(plain(a).cmp(&plain(b)))
                .then(a.basis.cmp(&b.basis))
                .then(b.least_margin().total_cmp(&a.least_margin()))
        });
        fits.into_iter().map(|(_, fit)| fit).collect()
    }

    /// A fit with the time that it leaves, where one is required.
    fn timed(&self, mut fit: ChosenFit) -> ChosenFit {
        if let Some(timing) = &self.timing {
            fit.found.push(timing.of(&fit.limits));
        }
        fit
    }

    /// A fit with what it gives for all that has edges.
    fn evaluated(&self, candidate: &Candidate) -> ChosenFit {
        let name = candidate.name;
        ChosenFit {
            basis: name.basis(),
            preferred_by: name.preferred_by(),
            finest_grade: name.finest_grade(),
            relative_cost: Some(candidate.cost),
            ..self.chosen(name.to_string(), candidate.limits)
        }
    }

    fn chosen(&self, callout: String, limits: FitLimits) -> ChosenFit {
        let made = limits.interference();
        let (found, refused) = self.found(&limits);
        ChosenFit {
            callout,
            limits,
            loosest: made.loosest,
            tightest: made.tightest,
            basis: None,
            preferred_by: Vec::new(),
            finest_grade: None,
            relative_cost: None,
            found,
            margin_below: made.loosest - self.window.least,
            margin_above: self.window.greatest.map(|greatest| greatest - made.tightest),
            seat: None,
            refused,
        }
    }

    /// What a fit gives for each requirement that has edges, and whether that is enough; and why it is refused.
    fn found(&self, limits: &FitLimits) -> (Vec<(Option<f64>, bool)>, Option<String>) {
        let interference = limits.interference();
        let made = Made { loosest: interference.loosest, tightest: interference.tightest };
        let wanted = || self.requirements.iter().filter(|wanted| wanted.subject.has_edges());
        let mut found: Vec<(Option<f64>, bool)> = wanted()
            .map(|wanted| (self.judge.found(wanted.subject, made), self.judge.meets(wanted.subject, made)))
            .collect();
        if let Some(refusal) = self.judge.refusal(limits) {
            return (found, Some(refusal.to_string()));
        }
        let close = wanted().zip(&found).any(|(wanted, (found, _))| {
            matches!((found, wanted.required), (Some(found), Some(required))
                if (found - required).abs() <= CLOSE * required.abs())
        });
        if close {
            let fit = Fit { callout: String::new(), limits: *limits, source: String::new() };
            match findings::compute(Joint { fits: vec![fit], ..self.joint.clone() }) {
                Ok(full) => {
                    let verdicts = full.verdicts.iter().filter(|verdict| has_edges(verdict));
                    for ((_, ok), verdict) in found.iter_mut().zip(verdicts) {
                        *ok = verdict.ok;
                    }
                }
                Err(error) => return (found, Some(error.to_string())),
            }
        }
        (found, None)
    }
}

/// Whether a verdict is one of the requirements with edges, which stand in the same order: a joint without load, a press
/// without a limit and a handling time have none.
fn has_edges(verdict: &Verdict) -> bool {
    match (verdict.question, verdict.unit) {
        (_, VerdictUnit::Time) => false,
        (Question::Hold, _) | (_, VerdictUnit::Force) => verdict.required.is_some(),
        _ => true,
    }
}
