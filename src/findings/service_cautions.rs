//! What a service state does that no requirement asks about: parts hotter than their material stands, parts that turn brittle in
//! the cold, an interface that opens though nothing loads it.

use super::{Caution, DutyFindings, Findings};
use crate::joint::{DutyState, Ring};
use crate::quantity::{Measure, show};

/// Below this a part counts as cold at work, K: −20 °C, the lowest temperature that structural steel codes take without a
/// further look at toughness (common practice, no source).
const COLD: f64 = 253.15;

/// The cautions of every state.
pub(super) fn cautions(findings: &Findings) -> Vec<Caution> {
    let mut all = Vec::new();
    for (state, duty) in findings.joint.duty.iter().zip(&findings.duty) {
        for (index, ring) in findings.joint.rings.iter().enumerate() {
            all.extend(hot(findings, state, index, ring));
            all.extend(cold(findings, state, index, ring));
        }
        all.extend(open(findings, state, duty));
    }
    all
}

/// The least and the greatest temperature of a ring in a state, K.
fn ends(state: &DutyState, index: usize) -> Option<(f64, f64)> {
    let inner = *state.temperatures.get(index)?;
    let outer = inner + state.temperature_rises.get(index).copied().unwrap_or(0.0);
    Some((inner.min(outer), inner.max(outer)))
}

fn hot(findings: &Findings, state: &DutyState, index: usize, ring: &Ring) -> Option<Caution> {
    let limit = ring.material.max_temperature.as_ref()?;
    let (_, hottest) = ends(state, index)?;
    let temperature = |kelvin| show(Measure::Temperature, kelvin, findings.joint.display);
    (hottest > limit.value).then(|| {
        Caution::found(
            "strength",
            format!(
                "In {} the {} is at {}, above the {} usually allowed for {}: its strength there is not that of 20 °C, which this \
                 sheet takes.",
                state.called(),
                ring.name,
                temperature(hottest),
                temperature(limit.value),
                ring.material.name
            ),
            &*limit.source,
        )
    })
}

fn cold(findings: &Findings, state: &DutyState, index: usize, ring: &Ring) -> Option<Caution> {
    let text = ring.material.low_temperature_caution.as_ref()?;
    let (coldest, _) = ends(state, index)?;
    (coldest < COLD).then(|| {
        let temperature = show(Measure::Temperature, coldest, findings.joint.display);
        let dot = if text.ends_with('.') { "" } else { "." };
        let told = format!("In {} the {} is at {temperature}. {text}{dot}", state.called(), ring.name);
        Caution::found("strength", told, "material record").usual()
    })
}

/// An interface that grips in the shop and not in a state without load, which no safety judges.
fn open(findings: &Findings, state: &DutyState, duty: &DutyFindings) -> Vec<Caution> {
    if duty.loosest.slip_safety.is_some() {
        return Vec::new();
    }
    let shop = findings.extremes.loosest.interfaces.iter();
    let pairs = shop.zip(&duty.loosest.interfaces).enumerate();
    pairs
        .filter(|(_, (shop, found))| shop.pressure > 0.0 && found.pressure <= 0.0)
        .filter_map(|(index, _)| {
            let name = |index: usize| findings.joint.rings.get(index).map(|ring| &ring.name);
            let (inner, outer) = (name(index)?, name(index + 1)?);
            Some(Caution::found(
                "hold",
                format!(
                    "In {} the {outer} comes loose from the {inner} at the loosest pair: no pressure is left there. The state has \
                     neither torque nor axial force, so that no safety against slip judges it.",
                    state.called()
                ),
                "pressures in service, as tabled",
            ))
        })
        .collect()
}
