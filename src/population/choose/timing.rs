//! The time from oven or bath to seated, fit by fit.
//!
//! It comes from the transient calculation of two parts that exchange heat, some milliseconds a fit, and need
//! not fall as the interference rises (an oven set to what the fit needs is hotter for a tighter one). So it has no
//! edge in the allowed window: fits that meet everything else are worked out in full, on all cores.

use std::sync::atomic::{AtomicUsize, Ordering};

use rayon::prelude::*;

use crate::findings;
use crate::joint::{Fit, Joint};
use crate::tolerance::FitLimits;

/// What a fit gives for the time: how long there is (s, none when there is none to tell), and whether it is enough.
pub(super) type Found = (Option<f64>, bool);

/// Told how many of how many tightest pairs have been worked out, from any thread.
pub type Progress<'a> = &'a (dyn Fn(usize, usize) + Sync);

/// Tightest pairs closer than this are worked out once, m: far below any size that is made.
const SAME: f64 = 1e-12;

/// A time this close to the required one, as a share of it, is worked out for the fit itself.
const CLOSE: f64 = 1e-6;

/// A joint whose handling time is required.
#[derive(Debug, Clone, Copy)]
pub(super) struct Timing<'a> {
    joint: &'a Joint,
    required: f64,
}

impl<'a> Timing<'a> {
    pub(super) fn new(joint: &'a Joint, required: f64) -> Self {
        Self { joint, required }
    }

    /// One fit, by the transient calculation of the full check; one that it refuses has no time.
    pub(super) fn of(&self, limits: &FitLimits) -> Found {
        let fit = Fit { callout: String::new(), limits: *limits, source: String::new() };
        let joint = Joint { fits: vec![fit], ..self.joint.clone() };
        let verdict = findings::seating_verdict(&joint).ok().flatten();
        verdict.map_or((None, false), |verdict| (verdict.found, verdict.ok))
    }

    /// Every fit, in the order given.
    ///
    /// The tightest pair alone sets the time, so fits that share it are worked out once, with the loosest of them: the
    /// course of its loosest pair encloses those of the others, and where it ends well, theirs do. Where it does not,
    /// or the time is a near thing, each is worked out by itself.
    pub(super) fn of_all(&self, fits: &[FitLimits], progress: Progress<'_>) -> Vec<Found> {
        let mut order: Vec<(f64, f64, usize)> = fits
            .iter()
            .enumerate()
            .map(|(number, limits)| {
                let made = limits.interference();
                (made.tightest, made.loosest, number)
            })
            .collect();
        order.sort_by(|a, b| a.0.total_cmp(&b.0));
        let groups: Vec<&[(f64, f64, usize)]> =
            order.chunk_by(|before, after| after.0 - before.0 <= SAME).collect();
        let (done, all) = (AtomicUsize::new(0), groups.len());
        let told = |found| {
            progress(done.fetch_add(1, Ordering::Relaxed) + 1, all);
            found
        };
        let found: Vec<Vec<(usize, Found)>> =
            groups.into_par_iter().map(|group| told(self.of_group(group, fits))).collect();
        let mut all = vec![(None, false); fits.len()];
        for (number, time) in found.into_iter().flatten() {
            if let Some(place) = all.get_mut(number) {
                *place = time;
            }
        }
        all
    }

    fn of_group(&self, group: &[(f64, f64, usize)], fits: &[FitLimits]) -> Vec<(usize, Found)> {
        let of = |number: usize| fits.get(number).map_or((None, false), |limits| self.of(limits));
        let Some((.., loosest)) = group.iter().min_by(|a, b| a.1.total_cmp(&b.1)) else { return Vec::new() };
        let found = of(*loosest);
        let alike = match found {
            (Some(time), _) => (time - self.required).abs() > CLOSE * self.required,
            (None, ok) => ok,
        };
        let each = |number: usize| if alike || number == *loosest { found } else { of(number) };
        group.iter().map(|(.., number)| (*number, each(*number))).collect()
    }
}
