//! What speed, heat, yielding, bending and length do, in plain sentences for terminal and report.

use crate::findings::{Findings, Loosening, PLAIN_SHARE, PairFindings};
use crate::mechanics::plastic::{Regime, YieldRule};
use crate::quantity::{Measure, factor_found, show};

/// The sentences that the joint calls for.
pub fn sentences(findings: &Findings) -> Vec<String> {
    let mut all = Vec::new();
    for (index, loosening) in findings.service.loosening.iter().enumerate() {
        all.extend(loosening_of(findings, index, loosening));
    }
    all.extend(governing(findings));
    all.extend(steps(findings));
    all.extend(sizes(findings));
    all.extend(liner(findings));
    all.extend(plastic(findings));
    all.extend(bending(findings));
    all.extend(fatigue(findings));
    all.extend(length(findings));
    all
}

fn loosening_of(findings: &Findings, index: usize, loosening: &Loosening) -> Vec<String> {
    let system = findings.joint.display;
    let name = if findings.joint.fits.len() == 1 {
        "the joint".to_owned()
    } else {
        format!("interface {}", index + 1)
    };
    if loosening.speed == Some(0.0) {
        return vec![format!("The loosest pair: {name} is open at rest.")];
    }
    let speed = match loosening.speed {
        Some(speed) => format!("opens at {} at shop temperature", show(Measure::Speed, speed, system)),
        None => "is opened by no speed".to_owned(),
    };
    let temperature = |kelvin: Option<f64>, what: &str| match kelvin {
        Some(kelvin) => format!("with {what} at {}", show(Measure::Temperature, kelvin, system)),
        None => format!("with {what} hot at no temperature within the expansion data"),
    };
    let outside =
        if findings.joint.rings.len() > 2 { "only the parts outside it" } else { "only the outer part" };
    vec![format!(
        "The loosest pair: {name} {speed}; it lets go {}, and {}.",
        temperature(loosening.temperature, "all parts"),
        temperature(loosening.outer_temperature, outside),
    )]
}

fn governing(findings: &Findings) -> Vec<String> {
    let joint = &findings.joint;
    joint
        .rings
        .iter()
        .zip(&findings.service.governing)
        .map(|(ring, governing)| {
            let state = governing.state.and_then(|index| joint.duty.get(index));
            format!(
                "The {} is stressed most, {}, with {} ({}).",
                ring.name,
                show(Measure::Pressure, governing.equivalent, joint.display),
                crate::findings::combination(&governing.tight),
                state.map_or("shop temperature", |state| state.name.as_str()),
            )
        })
        .collect()
}

fn steps(findings: &Findings) -> Vec<String> {
    let joint = &findings.joint;
    findings
        .service
        .steps
        .iter()
        .enumerate()
        .map(|(number, step)| {
            let stresses: Vec<String> = joint
                .rings
                .iter()
                .zip(&step.rings)
                .map(|(ring, stress)| {
                    format!("{} {}", ring.name, show(Measure::Pressure, stress.equivalent, joint.display))
                })
                .collect();
            format!(
                "After step {} of assembly (fit {}, tightest pair) the equivalent stresses are {}.",
                number + 1,
                step.interface + 1,
                stresses.join(", ")
            )
        })
        .collect()
}

/// Sizes after assembly: the bore left for reaming, the outer diameter.
fn sizes(findings: &Findings) -> Vec<String> {
    let joint = &findings.joint;
    let (Some(loosest), Some(tightest)) =
        (ends(&findings.extremes.loosest.rings), ends(&findings.extremes.tightest.rings))
    else {
        return Vec::new();
    };
    let (shaft, hub) = joint.shaft_and_hub();
    let change = |metres: f64| show(Measure::Deviation, metres, joint.display);
    let mut all = Vec::new();
    if shaft.inner_diameter > 0.0 {
        let size = |closing: f64| show(Measure::Size, shaft.inner_diameter + closing, joint.display);
        all.push(format!(
            "The bore of the {} changes by {} to {} in assembly: {} becomes {} to {}.",
            shaft.name,
            change(loosest.0),
            change(tightest.0),
            show(Measure::Size, shaft.inner_diameter, joint.display),
            size(loosest.0),
            size(tightest.0),
        ));
    }
    let place = if joint.slices.is_empty() { "" } else { " (where it is stressed most)" };
    all.push(format!(
        "The outer diameter of the {}{place} grows by {} to {}.",
        hub.name,
        change(loosest.1),
        change(tightest.1)
    ));
    all
}

fn ends(rings: &[crate::findings::RingStress]) -> Option<(f64, f64)> {
    Some((rings.first()?.bore_change, rings.last()?.outer_change))
}

fn liner(findings: &Findings) -> Option<String> {
    let liner = findings.service.liner.as_ref()?;
    let (bush, _) = findings.joint.shaft_and_hub();
    let pressure = |pascals| show(Measure::Pressure, pascals, findings.joint.display);
    Some(format!(
        "The wall of the {} is {:.1} % of its mean diameter: a long tube of it buckles inwards at {} when nothing holds it \
         round (Timoshenko & Gere, Theory of Elastic Stability, § 7.5), in a rigid housing at {} (Glock 1977, from memory); \
         the tightest pair presses it with {}.",
        bush.name,
        100.0 * liner.slenderness,
        pressure(liner.free),
        pressure(liner.housed),
        pressure(liner.pressure),
    ))
}

fn plastic(findings: &Findings) -> Vec<String> {
    let joint = &findings.joint;
    let Some(plastic) = &findings.service.plastic else { return Vec::new() };
    let state = &plastic.tightest;
    if state.regime == Regime::Elastic {
        return Vec::new();
    }
    let (_, hub) = joint.shaft_and_hub();
    let pressure = |pascals| show(Measure::Pressure, pascals, joint.display);
    let regime = match state.regime {
        Regime::Elastic => "is elastic",
        Regime::ElasticPlastic => "is plastic at the bore",
        Regime::FullyPlastic => "is plastic through",
        Regime::PressureCap => "has reached the greatest pressure it can carry; do not accept it",
    };
    let mut all = vec![format!(
        "At the tightest pair the {} {regime} ({} rule): contact pressure {} of at most {}, plastic to a diameter of {}, \
         {:.1} % of its section.",
        hub.name,
        state.rule.name(),
        pressure(state.pressure),
        pressure(plastic.limits.limit_pressure),
        show(Measure::Size, state.plastic_diameter, joint.display),
        state.plastic_share * 100.0,
    )];
    let growth = show(Measure::Deviation, state.permanent.bore, joint.display);
    let caveat = if state.permanent.reverse_yield {
        ", overstated since the bore yields again on removal"
    } else {
        ""
    };
    all.push(format!("Taken apart, the bore of the {} stays larger by {growth}{caveat}.", hub.name));
    if let Some(worn) = &plastic.worn {
        let place = worn.state.and_then(|index| joint.duty.get(index));
        all.push(format!(
            "The {} is strained hardest {}: from then on the joint grips as an elastic one whose interference is less by {} at \
             the loosest and {} at the tightest pair. The states count that.",
            hub.name,
            place.map_or("in assembly".to_owned(), |state| format!("in {}", state.called())),
            show(Measure::Deviation, worn.loosest, joint.display),
            show(Measure::Deviation, worn.tightest, joint.display),
        ));
        if place.is_some_and(|state| state.speed > 0.0) && state.rule == YieldRule::VonMises {
            all.push(
                "What rotation adds to that growth is taken from Tresca's rule: an estimate.".to_owned(),
            );
        }
    }
    all
}

fn bending(findings: &Findings) -> Vec<String> {
    let joint = &findings.joint;
    let mut all = Vec::new();
    for (state, duty) in joint.duty.iter().zip(&findings.duty) {
        let Some(bending) = &duty.loosest.bending else { continue };
        all.push(format!(
            "Bending in {}: the edge pressure changes by {}; an edge of the loosest pair gapes from {} on. Edge \
             slip and fretting start earlier: half of that is recommended under rotating bending.",
            state.called(),
            show(Measure::Pressure, bending.edge_change, joint.display),
            show(Measure::Torque, bending.limiting_moment, joint.display),
        ));
    }
    for state in joint.duty.iter().filter(|state| state.relaxation < 1.0) {
        all.push(format!(
            "In {} holding counts {:.0} % of the fresh pressure, the share that relaxation leaves (joint file).",
            state.called(),
            100.0 * state.relaxation
        ));
    }
    for state in joint.duty.iter().filter(|state| state.reversing) {
        all.push(format!(
            "The torque of {} reverses: 1.8 to 2.2 against slip is usual there (textbooks after DIN 7190, from memory).",
            state.called()
        ));
    }
    all
}

fn fatigue(findings: &Findings) -> Vec<String> {
    let joint = &findings.joint;
    findings
        .service
        .fatigue
        .iter()
        .filter_map(|fatigue| {
            let state = joint.duty.get(fatigue.state)?;
            Some(format!(
                "Rotating bending in {}: nominal stress of the shaft {}; notch factor at a plain hub edge {:.1} to {:.1}, \
                 size {:.2}, surface {:.2} (DIN 743-2, from memory; tests of Horger & Maulbetsch 1936), together {:.1} to \
                 {:.1}; with {} of the tensile strength for a small polished bar (from memory) the safety is {} to {}. \
                 Figures of steel shafts; not a fatigue calculation.",
                state.called(),
                show(Measure::Pressure, fatigue.nominal_stress, joint.display),
                fatigue.notch_factor.low,
                fatigue.notch_factor.high,
                fatigue.size_factor,
                fatigue.surface_factor,
                fatigue.reduction.low,
                fatigue.reduction.high,
                PLAIN_SHARE,
                factor_found(fatigue.safety.low),
                factor_found(fatigue.safety.high),
            ))
        })
        .collect()
}

fn length(findings: &Findings) -> Vec<String> {
    let Some(factors) = &findings.service.length_factors else { return Vec::new() };
    let pressure = |pascals| show(Measure::Pressure, pascals, findings.joint.display);
    let band = |pair: &PairFindings| {
        format!("{} to {}", pressure(pair.pressure), pressure(pair.pressure * factors.mean_pressure))
    };
    vec![format!(
        "On a shaft that stands out of the hub the mean pressure is about {:.1} % above that of the thick-walled cylinder: \
         {} at the loosest pair, {} at the tightest; at a sharp edge it is about {:.1} times that figure: relieve the hub \
         edge or raise the seat.",
        (factors.mean_pressure - 1.0) * 100.0,
        band(&findings.extremes.loosest),
        band(&findings.extremes.tightest),
        factors.edge_pressure
    )]
}
