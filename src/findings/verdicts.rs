//! The three questions answered: each requirement with what was found, at which pair and state.

use super::times::Times;
use super::{Findings, Question, RingStress, Verdict, VerdictUnit};
use crate::joint::{Allow, Joint, Method, Ring};
use crate::material::Kind;
use crate::mechanics::plastic::Regime;

/// Verdicts in the order hold, strength, assembly.
pub(super) fn verdicts(findings: &Findings) -> Vec<Verdict> {
    let mut verdicts = hold(findings);
    verdicts.extend(strength(findings));
    verdicts.extend(assembly(findings));
    verdicts.sort_by_key(|verdict| verdict.question);
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

/// One verdict for each ring: its least safety over the shop and every state, at the combination of interferences
/// that governs it. A hub that may yield by design is judged by its plastic share instead.
fn strength(findings: &Findings) -> Vec<Verdict> {
    let joint = &findings.joint;
    let hub = joint.rings.len() - 1;
    let mut verdicts: Vec<Verdict> = Vec::new();
    for (index, ring) in joint.rings.iter().enumerate() {
        if index == hub
            && let Some(verdict) = plastic_share(findings)
        {
            verdicts.push(verdict);
            continue;
        }
        let required = required_strength_safety(findings, ring);
        let (found, at) = least_safety(findings, index);
        verdicts.push(Verdict {
            question: Question::Strength,
            subject: format!("{} safety against {}", ring.name, failure(ring)),
            required: Some(required),
            found,
            unit: VerdictUnit::Safety,
            ok: found.is_none_or(|found| found >= required),
            at,
        });
    }
    verdicts.extend(edges(findings));
    verdicts
}

/// The hub that may yield: the share of its section that is plastic at the tightest pair.
fn plastic_share(findings: &Findings) -> Option<Verdict> {
    let Allow::Plastic { share } = findings.joint.require.allow else { return None };
    let worn = findings.service.plastic.as_ref()?.worn.as_ref()?;
    let state = &worn.hardest;
    let place = worn.state.and_then(|index| findings.joint.duty.get(index));
    let (_, hub) = findings.joint.shaft_and_hub();
    let carried = matches!(state.regime, Regime::Elastic | Regime::ElasticPlastic);
    Some(Verdict {
        question: Question::Strength,
        subject: format!("plastic share of the {}", hub.name),
        required: Some(share),
        found: Some(state.plastic_share),
        unit: VerdictUnit::Share,
        ok: carried && state.plastic_share <= share,
        at: format!("tightest pair, {}", place.map_or("as assembled", |state| state.name.as_str())),
    })
}

/// Edges under bending: closed at the loosest pair, elastic at the tightest.
fn edges(findings: &Findings) -> Vec<Verdict> {
    let mut verdicts = Vec::new();
    for (state, duty) in findings.joint.duty.iter().zip(&findings.duty) {
        if let Some(bending) = &duty.loosest.bending {
            let found = if bending.edge_change > 0.0 {
                (bending.least_edge + bending.edge_change) / bending.edge_change
            } else {
                0.0
            };
            verdicts.push(Verdict {
                question: Question::Hold,
                subject: "safety against a gaping edge".to_owned(),
                required: Some(1.0),
                found: Some(found),
                unit: VerdictUnit::Safety,
                ok: found >= 1.0,
                at: format!("loosest pair, {}", state.name),
            });
        }
        let Some(bending) = &duty.tightest.bending else { continue };
        let onset = findings.onset_of_yield.as_ref();
        let by_onset = onset.map(|onset| (onset.ring, onset.pressure / bending.greatest_edge));
        if let Some((ring, found)) = bending.weakest.or(by_onset) {
            let required =
                findings.joint.rings.get(ring).map(|ring| required_strength_safety(findings, ring));
            verdicts.push(Verdict {
                question: Question::Strength,
                subject: "safety of the loaded edge".to_owned(),
                required,
                found: Some(found),
                unit: VerdictUnit::Safety,
                ok: required.is_none_or(|required| found >= required),
                at: format!("tightest pair, {}", state.name),
            });
        }
    }
    verdicts
}

/// What the criterion of a ring's kind guards against.
pub fn failure(ring: &Ring) -> &'static str {
    match ring.material.kind {
        Kind::Brittle => "fracture",
        Kind::Polymer if ring.material.long_term_strength.is_some() => "creep",
        Kind::Ductile | Kind::Polymer => "yield",
    }
}

fn required_strength_safety(findings: &Findings, ring: &Ring) -> f64 {
    match ring.material.kind {
        Kind::Brittle => findings.joint.require.fracture_safety,
        Kind::Ductile | Kind::Polymer => findings.joint.require.yield_safety,
    }
}

/// The least safety of a ring, and where it is found.
fn least_safety(findings: &Findings, ring: usize) -> (Option<f64>, String) {
    let joint = &findings.joint;
    if let Some(governing) = findings.service.governing.get(ring) {
        let state = governing.state.and_then(|index| joint.duty.get(index));
        let place = state.map_or("shop temperature", |state| state.name.as_str());
        return (governing.safety, format!("{}, {place}", combination(&governing.tight)));
    }
    let safety = |rings: &[RingStress]| rings.get(ring).and_then(|stress| stress.safety);
    let mut least = (safety(&findings.extremes.tightest.rings), "tightest pair, shop temperature".to_owned());
    for (state, duty) in joint.duty.iter().zip(&findings.duty) {
        for (pair, found) in [("tightest", &duty.tightest), ("loosest", &duty.loosest)] {
            let found = safety(&found.rings);
            let lower = match (found, least.0) {
                (Some(found), Some(best)) => found < best,
                (Some(_), None) => true,
                (None, _) => false,
            };
            if lower {
                least = (found, format!("{pair} pair, {}", state.name));
            }
        }
    }
    least
}

/// A combination of interferences in words.
pub fn combination(tight: &[bool]) -> String {
    if tight.iter().all(|tight| *tight) {
        return "every fit tightest".to_owned();
    }
    if !tight.iter().any(|tight| *tight) {
        return "every fit loosest".to_owned();
    }
    let named: Vec<String> = tight
        .iter()
        .enumerate()
        .map(|(index, tight)| format!("fit {} {}", index + 1, if *tight { "tightest" } else { "loosest" }))
        .collect();
    named.join(", ")
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
    let (shaft, hub) = findings.joint.joined_last();
    let limit = assembly.hub_limit.as_ref().map(|(limit, _)| *limit);
    let plan = &findings.joint.assembly;
    // A hub left in its oven becomes as hot as that, and no hotter.
    let oven = plan.practice.oven_temperature.filter(|_| plan.heats());
    let too_hot = oven.filter(|oven| limit.is_some_and(|limit| *oven > limit));
    let limit = limit.into_iter().chain(oven).reduce(f64::min);
    let below = |found: Option<f64>| found.is_some_and(|found| limit.is_none_or(|limit| found <= limit));
    let mut verdicts = match findings.joint.assembly.method {
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
                too_hot.or(route.temperature),
                route.possible && too_hot.is_none() && below(route.temperature),
                if too_hot.is_some() { "left in its oven" } else { "tightest pair with clearance" },
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
            let found = too_hot.or(bath.and_then(|bath| bath.hub_temperature));
            let ok = below(found);
            vec![verdict(
                &format!("{} temperature besides the bath", hub.name),
                VerdictUnit::Temperature,
                limit,
                found,
                ok,
                "tightest pair with clearance",
            )]
        }
    };
    verdicts.extend(earlier(findings));
    verdicts.extend(handling(&findings.joint, &assembly.times));
    verdicts
}

/// The joints of several rings that are made before the last one.
fn earlier(findings: &Findings) -> Vec<Verdict> {
    let joint = &findings.joint;
    let found = findings.assembly.earlier.iter();
    found
        .map(|earlier| {
            let name = |index: usize| joint.rings.get(index).map_or("part", |ring| ring.name.as_str());
            let outer = name(earlier.interface + 1);
            let cold = |alone: bool| alone.then(|| super::bath_temperature(joint.assembly.bath));
            let within = |found: Option<f64>| {
                found.is_some_and(|found| earlier.hub_limit.is_none_or(|limit| found <= limit))
            };
            let (subject, unit, required, found, ok) = match joint.assembly.method {
                Method::Press => {
                    let (force, allowed) = (earlier.press_force, joint.require.press_force);
                    let ok = allowed.is_none_or(|allowed| force <= allowed);
                    ("peak press force".to_owned(), VerdictUnit::Force, allowed, Some(force), ok)
                }
                Method::HeatHub => {
                    let found = earlier.hub_temperature;
                    let subject = format!("{outer} temperature");
                    (subject, VerdictUnit::Temperature, earlier.hub_limit, found, within(found))
                }
                Method::ChillShaft => {
                    let subject = format!("{} in the bath", name(earlier.interface));
                    let found = cold(earlier.bath_alone);
                    (subject, VerdictUnit::Temperature, cold(true), found, earlier.bath_alone)
                }
                Method::HeatAndChill => {
                    let found = earlier.hub_temperature_in_bath;
                    let subject = format!("{outer} temperature besides the bath");
                    (subject, VerdictUnit::Temperature, earlier.hub_limit, found, within(found))
                }
            };
            Verdict {
                question: Question::Assembly,
                subject,
                required,
                found,
                unit,
                ok,
                at: format!("fit {}, made before the last, every fit tightest", earlier.interface + 1),
            }
        })
        .collect()
}

/// The time from oven or bath to seated; nothing when the parts pass each other for ever and nothing is required.
pub(super) fn handling(joint: &Joint, times: &Times) -> Option<Verdict> {
    let plan = &joint.assembly;
    if !plan.heats() && !plan.chills() {
        return None;
    }
    let required = plan.practice.time_needed();
    let handling = times.handling.as_ref();
    let found = handling.and_then(|handling| handling.tightest.gone);
    if found.is_none() && required.is_none() {
        return None;
    }
    let ok = match (handling, found, required) {
        (Some(_), Some(found), Some(required)) => found >= required,
        (None, _, Some(_)) => false,
        _ => true,
    };
    let from = if plan.heats() { "oven" } else { "bath" };
    Some(Verdict {
        question: Question::Assembly,
        subject: format!("time from {from} to seated"),
        required,
        found,
        unit: VerdictUnit::Time,
        ok,
        at: "tightest pair, until no clearance is left".to_owned(),
    })
}
