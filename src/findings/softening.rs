//! A hub that may yield by design: what its permanent growth leaves of the grip.
//!
//! Yielding is not undone when the load falls. A hub that has yielded in assembly, or in the hardest state since,
//! keeps its bore larger by the permanent growth Δ and unloads elastically, so that the joint from then on acts as an
//! elastic one of the interference U − Δ. Taking the pressure of a state from the plastic curve at the state's own
//! interference, or scaling the elastic pressure by a share, would follow the curve back down and promise more grip
//! than is left, since the curve rises less steeply than the elastic line falls.
//!
//! Perfect plasticity gives Δ. A state that stresses the bore beyond what assembly did (a colder hub, a pressure inside
//! the shaft) is counted as the interference that stresses the bore alike, and a rotating one as the interference that
//! leaves the growth that Tresca's hub has at its speed. For von Mises Tresca's increase by rotation is taken.
//!
//! Δ is worked with the moduli of the shop temperature, at which the joint is made. It is a length and stays when the
//! moduli change with the temperature of a state, so the pressure of a state is that of U − Δ on elastic rings with the
//! moduli of the state. Where a state makes the hub yield further, its growth with moduli E_h', E_s' in place of E_h, E_s
//! would be at most max(1, E_h/E_h', E_s/E_s') of that with the moduli of the shop: the yield strengths are the same, so the
//! plastic strain that goes with a stress is 1/E_h', and a shaft that is softer than its hub lets it grow no further than a
//! hub as soft. That greatest value is counted, which errs to the side of less grip.

use super::compute::{FRESH, FindingsError};
use super::condition::Condition;
use super::kernel::{Kernel, PairInterference};
use super::service::WornHub;
use super::{DutyFindings, PairFindings, PlasticFindings, RingStress};
use crate::joint::{DutyState, Joint};
use crate::mechanics::plastic::{PlasticJoint, PlasticState, SpinningJoint, YieldRule};
use crate::numerics::root;
use crate::tolerance::Extremes;

/// Elastic figures that the permanent growth changes.
pub(super) struct Parts<'a> {
    /// Interferences; their grip becomes less.
    pub(super) pairs: &'a mut Extremes<PairInterference>,
    /// The pairs at the shop temperature, as assembled.
    pub(super) extremes: &'a mut Extremes<PairFindings>,
    /// The service states.
    pub(super) duty: &'a mut [DutyFindings],
}

/// Puts what is left of the grip into the pairs and states, with what follows from it.
///
/// The hub's stresses stay those of an elastic hub: they show how far beyond its limit it is.
pub(super) fn soften(
    joint: &Joint,
    kernel: &Kernel<'_>,
    plastic: &mut PlasticFindings,
    parts: &mut Parts<'_>,
) -> Result<(), FindingsError> {
    let bore = BoreStress::of(joint, kernel)?;
    let hardest = |pair: &PairInterference, assembled: &PlasticState| {
        let known = growth(&plastic.joint, assembled.interference).0;
        let alike = |state: &DutyState| bore.alike(joint, kernel, &plastic.joint, state, pair, known);
        let mut hardest = (assembled.interference, None);
        for (index, state) in joint.duty.iter().enumerate() {
            let alike = alike(state)?;
            if alike > hardest.0 * (1.0 + 1e-9) {
                hardest = (alike, Some(index));
            }
        }
        Ok::<_, FindingsError>(hardest)
    };
    let loosest = hardest(&parts.pairs.loosest, &plastic.loosest)?;
    let tightest = hardest(&parts.pairs.tightest, &plastic.tightest)?;
    let Extremes { loosest: loose, mean, tightest: tight } = &mut *parts.pairs;
    for (pair, found, state) in [
        (&mut *loose, &mut parts.extremes.loosest, &plastic.loosest),
        (mean, &mut parts.extremes.mean, &plastic.mean),
        (&mut *tight, &mut parts.extremes.tightest, &plastic.tightest),
    ] {
        pair.shrink(state.permanent.bore);
        let softened = kernel.pair(pair)?;
        let rings = with_elastic_hub(softened.rings, &found.rings, state);
        *found = PairFindings { rings, ..softened };
    }
    let (loosest_growth, _) = growth(&plastic.joint, loosest.0);
    let (tightest_growth, hardest) = growth(&plastic.joint, tightest.0);
    loose.shrink(loosest_growth);
    tight.shrink(tightest_growth);
    let hardest = hardest.unwrap_or(plastic.tightest);
    let least = growth(&plastic.joint, loosest.0).1.unwrap_or(plastic.loosest);
    for (state, found) in joint.duty.iter().zip(parts.duty.iter_mut()) {
        for (pair, found, worn, share) in [
            (&*loose, &mut found.loosest, &least, state.relaxation),
            (&*tight, &mut found.tightest, &hardest, FRESH),
        ] {
            let softened = kernel.state(state, pair, share)?;
            let rings = with_elastic_hub(softened.rings.clone(), &found.rings, worn);
            *found = super::StateFindings { rings, ..softened };
        }
    }
    plastic.worn =
        Some(WornHub { loosest: loosest_growth, tightest: tightest_growth, hardest, state: tightest.1 });
    Ok(())
}

impl PairInterference {
    /// What grips when the hub's bore stays larger by this, m.
    pub(super) fn shrink(&mut self, growth: f64) {
        self.grip = self.effective.iter().map(|effective| effective - growth).collect();
    }
}

/// The rings under what grips; the hub with its elastic stresses, and with the growth that stays in its sizes.
fn with_elastic_hub(
    softened: Vec<RingStress>,
    elastic: &[RingStress],
    worn: &PlasticState,
) -> Vec<RingStress> {
    let mut rings = softened;
    if let (Some(hub), Some(elastic)) = (rings.last_mut(), elastic.last()) {
        *hub = RingStress {
            bore_change: hub.bore_change + worn.permanent.bore,
            outer_change: hub.outer_change + worn.permanent.rim,
            ..elastic.clone()
        };
    }
    rings
}

/// Permanent growth of the bore at an interference, with the hub there.
///
/// Beyond the interference at which the shaft yields too, all that is added is counted as lost.
fn growth(joint: &PlasticJoint, interference: f64) -> (f64, Option<PlasticState>) {
    if let Ok(state) = joint.solve(interference) {
        return (state.permanent.bore, Some(state));
    }
    let last = joint.limits().shaft_yield_interference.unwrap_or(0.0);
    let known = joint.solve(last * (1.0 - 1e-9)).ok();
    let grown = known.as_ref().map_or(0.0, |state| state.permanent.bore);
    (grown + (interference - last).max(0.0), known)
}

/// Elastic equivalent stress at the hub's bore, by which the hardest state is found.
struct BoreStress {
    rule: YieldRule,
    /// For each metre of interference, Pa/m.
    per_interference: f64,
}

impl BoreStress {
    fn of(joint: &Joint, kernel: &Kernel<'_>) -> Result<Self, FindingsError> {
        let unit = joint.diameter * 1e-3;
        let (_, rings) = kernel.cold(&[unit])?;
        let mut bore = Self { rule: joint.require.yield_rule, per_interference: 1.0 };
        bore.per_interference = bore.equivalent(&rings) / unit;
        Ok(bore)
    }

    fn equivalent(&self, rings: &[RingStress]) -> f64 {
        rings.last().map_or(0.0, |hub| match self.rule {
            YieldRule::VonMises => hub.bore.von_mises,
            _ => hub.bore.tresca,
        })
    }

    /// The interference at rest that leaves the bore of the hub as grown as a state does; `known` is what it has grown by
    /// in assembly, m.
    fn alike(
        &self,
        joint: &Joint,
        kernel: &Kernel<'_>,
        plastic: &PlasticJoint,
        state: &DutyState,
        pair: &PairInterference,
        known: f64,
    ) -> Result<f64, FindingsError> {
        let at_rest = DutyState { speed: 0.0, ..state.clone() };
        let rings = kernel.state(&at_rest, pair, FRESH)?.rings;
        let alike = self.equivalent(&rings) / self.per_interference;
        let softer = softer(joint, kernel, state)?;
        if state.speed == 0.0 && softer == 1.0 {
            return Ok(alike);
        }
        let added = if state.speed == 0.0 {
            0.0
        } else {
            // Beyond the theory the hub flows freely, and nothing of the grip is counted on.
            turned(joint, plastic, alike, state.speed).unwrap_or(alike)
        };
        let grown = growth(plastic, alike).0 + added;
        let grown = if grown > known * (1.0 + 1e-9) { grown * softer } else { grown };
        Ok(with_growth(plastic, alike, grown))
    }
}

/// The greater of the moduli of both rings at the shop temperature over those in a state, one at least.
fn softer(joint: &Joint, kernel: &Kernel<'_>, state: &DutyState) -> Result<f64, FindingsError> {
    let (shop, hot) =
        (kernel.shop.youngs_moduli(joint)?, Condition::of_state(joint, state)?.youngs_moduli(joint)?);
    Ok(shop.iter().zip(&hot).map(|(shop, hot)| shop / hot).fold(1.0, f64::max))
}

/// Growth that rotation adds to a hub after Tresca; none where the theory ends.
fn turned(joint: &Joint, plastic: &PlasticJoint, interference: f64, speed: f64) -> Option<f64> {
    let (shaft, hub) = joint.shaft_and_hub();
    let input = plastic.input();
    let yield_difference = match input.rule {
        YieldRule::ModifiedTresca => 2.0 / 3f64.sqrt() * input.hub_yield_strength,
        YieldRule::Tresca | YieldRule::VonMises => input.hub_yield_strength,
    };
    let spinning = SpinningJoint {
        rings: input.rings,
        yield_difference,
        hub_density: hub.material.density.value,
        shaft_density: shaft.material.density.value,
    };
    let turned = spinning.permanent_growth(interference, speed).ok()?;
    Some((turned - spinning.permanent_growth(interference, 0.0).ok()?).max(0.0))
}

/// The least interference, from `from` on, that leaves this growth.
fn with_growth(plastic: &PlasticJoint, from: f64, wanted: f64) -> f64 {
    if growth(plastic, from).0 >= wanted {
        return from;
    }
    let mut to = from + wanted;
    for _ in 0..60 {
        if growth(plastic, to).0 >= wanted {
            break;
        }
        to += to - from;
    }
    root::bracketed(|interference| growth(plastic, interference).0 - wanted, from, to, 0.0).unwrap_or(to)
}
