//! Cautions and notes that the numbers of a joint call for.

use super::{
    Caution, Findings, bearing_of, fatigue, joining_cautions, modulus_notes, service_cautions, shaft_alone,
};
use crate::joint::Allow;
use crate::material::Kind;
use crate::mechanics::criteria::DuctileCriterion;
use crate::quantity::{Measure, show};
use crate::tolerance::Character;

/// Cautions: strength and grip first, then those of the method of assembly.
pub(super) fn cautions(findings: &Findings) -> Vec<Caution> {
    let mut all = Vec::new();
    all.extend(yielding(findings));
    all.extend(clearance(findings));
    all.extend(input_remarks(findings));
    all.extend(proportions(findings));
    all.extend(polymers(findings));
    all.extend(buckling(findings));
    all.extend(service_cautions::cautions(findings));
    all.extend(shaft_alone::cautions(findings));
    all.extend(bearing_of::cautions(findings));
    all.extend(joining_cautions::cautions(findings));
    all
}

fn yielding(findings: &Findings) -> Vec<Caution> {
    let joint = &findings.joint;
    // A hub that may yield by design is judged by its own rule.
    let by_design = joint.require.allow != Allow::Elastic && findings.service.plastic.is_some();
    let Some(onset) = findings.onset_of_yield.as_ref().filter(|_| !by_design) else { return Vec::new() };
    let unit = |m: f64| show(Measure::Deviation, m, joint.display).to_string();
    let Some(ring) = joint.rings.get(onset.ring) else { return Vec::new() };
    let brittle = ring.material.kind == Kind::Brittle;
    let verb = if brittle { "break" } else { "yield" };
    let beyond = findings.extremes.tightest.effective_interference > onset.interference;
    if !beyond {
        return Vec::new();
    }
    let pair = if findings.extremes.loosest.effective_interference > onset.interference {
        "every pair"
    } else if findings.extremes.mean.effective_interference > onset.interference {
        "the mean and the tightest pair"
    } else {
        "the tightest pair"
    };
    vec![Caution {
        subject: "strength",
        text: format!(
            "The {} begins to {verb} at an interference of {}; {pair} exceeds it (tightest {}). Elastic figures beyond \
             that interference are not valid.",
            ring.name,
            unit(onset.interference),
            unit(findings.extremes.tightest.effective_interference),
        ),
        source: criterion_source(brittle, joint.criterion).to_owned(),
        usual: false,
    }]
}

/// The published criterion by name.
pub fn criterion_source(brittle: bool, criterion: DuctileCriterion) -> &'static str {
    match (brittle, criterion) {
        (true, _) => {
            "greatest principal stress (Rankine) against tensile strength, compression against compressive strength"
        }
        (false, DuctileCriterion::VonMises) => "von Mises criterion, plane stress",
        (false, DuctileCriterion::Tresca) => "Tresca criterion with the axial stress zero counted",
    }
}

fn clearance(findings: &Findings) -> Vec<Caution> {
    let text = match findings.character {
        Character::Interference => {
            if findings.extremes.loosest.interference > 0.0 && findings.extremes.loosest.pressure <= 0.0 {
                "At the loosest pair smoothing or temperature takes all of the interference: the pressure there is 0."
            } else {
                return Vec::new();
            }
        }
        Character::Transition => {
            "This is a transition fit: the loosest pair has clearance, its pressure is 0 and it holds nothing."
        }
        Character::Clearance => {
            "This is a clearance fit: even the tightest pair does not grip, the pressure is 0 at every pair."
        }
    };
    vec![Caution::found("hold", text, "ISO 286-1, clause 3.3")]
}

fn input_remarks(findings: &Findings) -> Vec<Caution> {
    let remarks = findings.joint.remarks.iter();
    remarks
        .map(|remark| Caution {
            subject: "input",
            text: remark.clone(),
            source: "the joint file as understood".to_owned(),
            usual: false,
        })
        .collect()
}

/// Where the long-cylinder formulas are least exact.
fn proportions(findings: &Findings) -> Vec<Caution> {
    let joint = &findings.joint;
    let mut all = Vec::new();
    if joint.engaged_length() < 0.5 * joint.diameter {
        all.push(Caution {
            subject: "strength",
            text: "The joint is shorter than half its diameter: under an overhanging shaft the mean pressure is 3 to 12 % \
                   above the value for long cylinders."
                .to_owned(),
            source: "axisymmetric finite elements, frictionless, hub ratios 0.3 to 0.7 (own computation)".to_owned(),
            usual: false,
        });
    }
    all
}

fn polymers(findings: &Findings) -> Vec<Caution> {
    let rings = findings.joint.rings.iter().filter(|ring| ring.material.kind == Kind::Polymer);
    rings
        .map(|ring| Caution {
            subject: "hold",
            text: format!(
                "The {} is a polymer: it creeps, so the pressure falls with time; {}.",
                ring.name,
                if findings.joint.duty.iter().all(|state| state.relaxation < 1.0) {
                    "holding counts the share that `relaxation` leaves, as given in the joint file, the stresses are those of \
                     the first hour"
                } else {
                    "the figures are those of the first hour unless the state gives a `relaxation`"
                }
            ),
            source: "common practice, no source".to_owned(),
            usual: false,
        })
        .collect()
}

/// A thin bush that its housing may press in.
fn buckling(findings: &Findings) -> Option<Caution> {
    let liner = findings.service.liner.as_ref().filter(|liner| liner.pressure > liner.housed)?;
    let (bush, _) = findings.joint.shaft_and_hub();
    let pressure = |pascals| show(Measure::Pressure, pascals, findings.joint.display);
    Some(Caution {
        subject: "strength",
        text: format!(
            "The thin wall of the {} may buckle inwards: the tightest pair presses it with {}, and from {} on it can leave \
             its housing in one place.",
            bush.name,
            pressure(liner.pressure),
            pressure(liner.housed),
        ),
        source: "D. Glock, Der Stahlbau 46 (1977) 212-217 (from memory): liner in a rigid housing".to_owned(),
        usual: false,
    })
}

/// A hub that may yield by design but is calculated as elastic.
fn elastic_all_the_same(findings: &Findings) -> Option<String> {
    let joint = &findings.joint;
    if joint.require.allow == Allow::Elastic || findings.service.plastic.is_some() {
        return None;
    }
    let why = if joint.rings.len() > 2 {
        "there are more than two rings"
    } else if !joint.slices.is_empty() {
        "hub or shaft is stepped"
    } else {
        "the shaft would yield as well, or is not ductile"
    };
    Some(format!("The hub may yield by design but is calculated as elastic: {why}."))
}

/// Why quantities do not exist, and what is not covered.
pub(super) fn notes(findings: &Findings) -> Vec<String> {
    let mut notes = Vec::new();
    for (state, duty) in findings.joint.duty.iter().zip(&findings.duty) {
        if duty.loosest.slip_safety.is_none() {
            notes.push(format!(
                "slip_safety of {} does not exist: the state has neither torque nor axial force.",
                state.called()
            ));
        }
    }
    for (ring, stress) in findings.joint.rings.iter().zip(&findings.extremes.tightest.rings) {
        if stress.strength.is_none() {
            notes.push(format!(
                "The safety of the {} does not exist: {} has no strength of the kind its criterion needs.",
                ring.name, ring.material.name
            ));
        } else if stress.safety.is_none() {
            let why = if ring.material.kind == Kind::Brittle && ring.tension_share() == 0.0 {
                "it is brittle, nowhere in tension, and its compressive strength is not known"
            } else {
                "nothing stresses it"
            };
            notes
                .push(format!("The safety of the {} at the tightest pair does not exist: {why}.", ring.name));
        }
    }
    notes.extend(elastic_all_the_same(findings));
    notes.extend(fatigue::note(findings));
    notes.extend(modulus_notes::notes(findings));
    notes.extend(findings.assembly.times.gaps.iter().cloned());
    notes.push(
        "Covered: rings in plane stress, elastic unless the hub may yield by design, with rotation, temperature and steady \
         heat flow. Not covered: hub ends and edges (the edge pressure of a sharp hub on a through shaft is about 1.5 to 1.7 times the mean), the shaft's own torsion and bending beside the fit, axial \
         friction while joining (0 to 10 % more pressure), form errors, creep, fretting."
            .to_owned(),
    );
    notes
}
