//! The three questions answered: each requirement with what was found, at which pair and state.

use super::{Findings, Question, RingStress, Verdict, VerdictUnit};
use crate::joint::{Method, Ring};
use crate::material::Kind;

/// Verdicts in the order hold, strength, assembly.
pub(super) fn verdicts(findings: &Findings) -> Vec<Verdict> {
    let mut verdicts = hold(findings);
    verdicts.extend(strength(findings));
    verdicts.extend(assembly(findings));
    verdicts
}

/// One verdict for each state that loads the joint, at the loosest pair.
fn hold(findings: &Findings) -> Vec<Verdict> {
    let joint = &findings.joint;
    let mut verdicts: Vec<Verdict> = joint
        .duty
        .iter()
        .zip(&findings.duty)
        .filter(|(state, _)| state.torque > 0.0 || state.axial_force > 0.0)
        .map(|(state, duty)| Verdict {
            question: Question::Hold,
            subject: "safety against slip".to_owned(),
            required: Some(joint.require.slip_safety),
            found: duty.loosest.slip_safety,
            unit: VerdictUnit::Safety,
            ok: duty.loosest.slip_safety.is_some_and(|found| found >= joint.require.slip_safety),
            at: format!("loosest pair, {}", state.name),
        })
        .collect();
    if verdicts.is_empty() {
        verdicts.push(Verdict {
            question: Question::Hold,
            subject: "safety against slip".to_owned(),
            required: None,
            found: None,
            unit: VerdictUnit::Safety,
            ok: true,
            at: "no torque or axial force stated".to_owned(),
        });
    }
    verdicts
}

/// One verdict for each ring: its least safety at the tightest pair over the shop and every state.
fn strength(findings: &Findings) -> Vec<Verdict> {
    let joint = &findings.joint;
    joint
        .rings
        .iter()
        .enumerate()
        .map(|(index, ring)| {
            let required = required_strength_safety(findings, ring);
            let (found, place) = least_safety(findings, index);
            Verdict {
                question: Question::Strength,
                subject: format!("{} safety against {}", ring.name, failure(ring)),
                required: Some(required),
                found,
                unit: VerdictUnit::Safety,
                ok: found.is_none_or(|found| found >= required),
                at: format!("tightest pair, {place}"),
            }
        })
        .collect()
}

/// What the criterion of a ring's kind guards against.
pub fn failure(ring: &Ring) -> &'static str {
    match ring.material.kind {
        Kind::Brittle => "fracture",
        Kind::Ductile | Kind::Polymer => "yield",
    }
}

fn required_strength_safety(findings: &Findings, ring: &Ring) -> f64 {
    match ring.material.kind {
        Kind::Brittle => findings.joint.require.fracture_safety,
        Kind::Ductile | Kind::Polymer => findings.joint.require.yield_safety,
    }
}

fn least_safety(findings: &Findings, ring: usize) -> (Option<f64>, String) {
    let safety = |rings: &[RingStress]| rings.get(ring).and_then(|stress| stress.safety);
    let mut least = (safety(&findings.extremes.tightest.rings), "shop temperature".to_owned());
    for (state, duty) in findings.joint.duty.iter().zip(&findings.duty) {
        let found = safety(&duty.tightest.rings);
        let lower = match (found, least.0) {
            (Some(found), Some(best)) => found < best,
            (Some(_), None) => true,
            (None, _) => false,
        };
        if lower {
            least = (found, state.name.clone());
        }
    }
    least
}

fn assembly(findings: &Findings) -> Vec<Verdict> {
    let assembly = &findings.assembly;
    let verdict = |subject: &str, unit, required, found, ok, at: &str| Verdict {
        question: Question::Assembly,
        subject: subject.to_owned(),
        required,
        found,
        unit,
        ok,
        at: at.to_owned(),
    };
    let (shaft, hub) = findings.joint.shaft_and_hub();
    let limit = assembly.hub_limit.as_ref().map(|(limit, _)| *limit);
    match findings.joint.assembly.method {
        Method::Press => {
            let force = assembly.press.tightest.peak_force;
            let allowed = findings.joint.require.press_force;
            let ok = allowed.is_none_or(|allowed| force <= allowed);
            vec![verdict(
                "peak press force",
                VerdictUnit::Force,
                allowed,
                Some(force),
                ok,
                "tightest pair, high friction",
            )]
        }
        Method::HeatHub => {
            let route = &assembly.heat_hub;
            vec![verdict(
                &format!("{} temperature", hub.name),
                VerdictUnit::Temperature,
                limit,
                route.temperature,
                route.possible,
                "tightest pair with clearance",
            )]
        }
        Method::ChillShaft => {
            let bath = assembly.baths.iter().find(|bath| bath.bath == findings.joint.assembly.bath);
            vec![verdict(
                &format!("{} temperature", shaft.name),
                VerdictUnit::Temperature,
                bath.map(|bath| bath.temperature),
                assembly.chill_shaft.temperature,
                bath.is_some_and(|bath| bath.alone),
                "tightest pair with clearance",
            )]
        }
        Method::HeatAndChill => {
            let bath = assembly.baths.iter().find(|bath| bath.bath == findings.joint.assembly.bath);
            let found = bath.and_then(|bath| bath.hub_temperature);
            let ok = found.is_some_and(|found| limit.is_none_or(|limit| found <= limit));
            vec![verdict(
                &format!("{} temperature besides the bath", hub.name),
                VerdictUnit::Temperature,
                limit,
                found,
                ok,
                "tightest pair with clearance",
            )]
        }
    }
}
