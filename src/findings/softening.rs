//! A hub that may yield by design: the pressures of the elastic-plastic hub in place of the elastic ones.

use super::{DutyFindings, PairFindings, PlasticFindings, StateFindings};
use crate::mechanics::plastic::{PlasticState, Regime};
use crate::tolerance::Extremes;

/// Pressure of the plastic hub over the elastic one; 1 while it is elastic.
///
/// Service states take the share of the shop temperature: rotation and heat with a plastic hub are not covered by a
/// theory of their own, and the share is taken from the state that made the hub yield.
pub fn plastic_share_of_pressure(state: &PlasticState) -> f64 {
    if state.regime == Regime::Elastic || state.elastic_pressure <= 0.0 {
        1.0
    } else {
        state.pressure / state.elastic_pressure
    }
}

/// Puts the pressures of the plastic hub into the pairs and states, with what follows from them.
pub(super) fn soften(
    extremes: &mut Extremes<PairFindings>,
    duty: &mut [DutyFindings],
    plastic: &PlasticFindings,
) {
    let shares = [&plastic.loosest, &plastic.mean, &plastic.tightest].map(plastic_share_of_pressure);
    for (pair, share) in
        [&mut extremes.loosest, &mut extremes.mean, &mut extremes.tightest].into_iter().zip(shares)
    {
        soften_pair(pair, share);
    }
    for state in duty {
        soften_state(&mut state.loosest, shares[0]);
        soften_state(&mut state.tightest, shares[2]);
    }
}

fn soften_pair(pair: &mut PairFindings, share: f64) {
    pair.pressure *= share;
    pair.torque_capacity *= share;
    pair.axial_capacity *= share;
    for force in [&mut pair.press_force, &mut pair.release_force] {
        force.low *= share;
        force.high *= share;
    }
    for interface in &mut pair.interfaces {
        interface.pressure *= share;
        interface.torque_capacity *= share;
        interface.axial_capacity *= share;
    }
    soften_shaft(&mut pair.rings, share);
}

fn soften_state(state: &mut StateFindings, share: f64) {
    state.pressure *= share;
    state.torque_capacity *= share;
    state.axial_capacity *= share;
    state.slip_safety = state.slip_safety.map(|safety| safety * share);
    for interface in &mut state.interfaces {
        interface.pressure *= share;
        interface.torque_capacity *= share;
        interface.axial_capacity *= share;
    }
    soften_shaft(&mut state.rings, share);
}

/// The elastic shaft under the lower pressure; at rest its stresses are proportional to it. The elastic figures of the
/// hub are kept: they show how far beyond its limit it is.
fn soften_shaft(rings: &mut [super::RingStress], share: f64) {
    let Some(shaft) = rings.first_mut() else { return };
    for face in [&mut shaft.bore, &mut shaft.rim] {
        face.radial *= share;
        face.hoop *= share;
        face.von_mises *= share;
        face.tresca *= share;
    }
    shaft.equivalent *= share;
    shaft.safety = shaft.safety.map(|safety| safety / share);
    shaft.bore_change *= share;
    shaft.outer_change *= share;
}
