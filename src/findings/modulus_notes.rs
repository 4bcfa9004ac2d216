//! What a reader must know of Young's modulus at temperature.

use super::Findings;
use crate::joint::{DutyState, Ring};
use crate::material::{Kind, REFERENCE_TEMPERATURE};
use crate::quantity::{Measure, number, show};

/// From this far from 20 °C on it is said that a metal without a curve keeps its modulus, K.
///
/// Over 50 K the metals that have a curve lose 0.8 to 2.2 % of their modulus when heated and gain 1.5 to 3.1 % when cooled
/// (`tests/materials_modulus.rs`); two sources of one metal differ as much at 20 °C. Common practice, no source.
const FAR: f64 = 50.0;

/// The same for polymers, K: dry polyamide and acetal lose about 1 % of their modulus for each kelvin near room
/// temperature (data sheets, from memory).
const FAR_POLYMER: f64 = 10.0;

/// Full sentences.
pub(super) fn notes(findings: &Findings) -> Vec<String> {
    let mut notes = Vec::new();
    let changed = changed(findings);
    if changed {
        notes.push(
            "Young's modulus is taken at the temperature of each ring in a state (with a radial gradient at the mean over its \
             section): stresses follow the elastic law at the current temperature, interference and expansion are lengths \
             and stay. Strength is not taken at temperature."
                .to_owned(),
        );
    }
    notes.extend(
        findings.joint.rings.iter().enumerate().filter_map(|(index, ring)| kept(findings, index, ring)),
    );
    if changed && findings.service.plastic.as_ref().is_some_and(|plastic| plastic.worn.is_some()) {
        notes.push(
            "The hub that may yield by design is worked with the moduli of the shop temperature: the growth that stays is a \
             length. What it leaves of the interference acts on elastic rings with the moduli of each state, and growth that a \
             softer state may add is counted at its upper bound."
                .to_owned(),
        );
    }
    notes
}

/// Whether any ring has another modulus in a state than at 20 °C.
fn changed(findings: &Findings) -> bool {
    let rings = &findings.joint.rings;
    findings.duty.iter().any(|state| {
        rings.iter().zip(&state.youngs_moduli).any(|(ring, own)| *own != ring.material.youngs_modulus.value)
    })
}

/// That a ring without a curve keeps its modulus in states far from 20 °C.
fn kept(findings: &Findings, index: usize, ring: &Ring) -> Option<String> {
    if ring.material.youngs_modulus_curve.is_some() {
        return None;
    }
    let joint = &findings.joint;
    let polymer = ring.material.kind == Kind::Polymer;
    let limit = if polymer { FAR_POLYMER } else { FAR };
    let farthest = |state: &DutyState| {
        let inner = state.temperatures.get(index).copied()?;
        let outer = inner + state.temperature_rises.get(index).copied().unwrap_or(0.0);
        let away = |kelvin: f64| (kelvin - REFERENCE_TEMPERATURE).abs();
        Some(if away(outer) > away(inner) { outer } else { inner })
    };
    let far = joint.duty.iter().filter_map(|state| Some((state, farthest(state)?)));
    let far = far.filter(|(_, kelvin)| (kelvin - REFERENCE_TEMPERATURE).abs() > limit);
    let states: Vec<String> = far
        .map(|(state, kelvin)| {
            format!("{} ({})", state.name, show(Measure::Temperature, kelvin, joint.display))
        })
        .collect();
    if states.is_empty() {
        return None;
    }
    let modulus = number(ring.material.youngs_modulus.value * 1e-9, 4);
    let what = if polymer {
        "A polymer softens steeply with heat, by about 1 % for each kelvin and far more near its transition, and stiffens in the \
         cold (data sheets, from memory): the pressure there is not to be relied on. Give the modulus of the temperature, or \
         a `youngs_modulus_curve`."
    } else {
        "Metals that have data lose 1 to 4 % at 100 °C and 5 to 14 % at 200 °C, and the pressure falls with the modulus; a \
         `youngs_modulus_curve` in the record gives it."
    };
    Some(format!(
        "{} ({}) has no data of Young's modulus against temperature: {modulus} GPa, that of 20 °C, is taken in {}. {what}",
        ring.material.id,
        ring.name,
        states.join(", "),
    ))
}
