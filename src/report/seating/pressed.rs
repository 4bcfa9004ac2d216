//! The press, and how the joint comes apart: by force, by heat, by oil.

use crate::assembly::oil::{OIL_PLANNED, OIL_SOURCE};
use crate::findings::Findings;
use crate::findings::oil::OilPair;
use crate::findings::press_work::{FaceFindings, PRESS_SPEED, PressWorkFindings};
use crate::quantity::{Measure, number, show};

/// The press: size, work, faces, buckling.
pub fn press(findings: &Findings) -> Vec<String> {
    let Some(work) = &findings.assembly.press_work else { return Vec::new() };
    let joint = &findings.joint;
    let (shaft, hub) = joint.joined_last();
    let system = joint.display;
    let mut all = vec![format!(
        "Press: {} ({} t, {} US tons) holds a quarter above the peak; work {}{}.",
        show(Measure::Force, work.size.force, system),
        number(work.size.metric_tons, 3),
        number(work.size.us_tons, 3),
        show(Measure::Work, findings.assembly.press.tightest.work, system),
        warming(findings, work)
    )];
    all.push(format!(
        "End faces under the peak: {}; {}.",
        face_text(findings, &shaft.name, &work.shaft_face),
        face_text(findings, &hub.name, &work.hub_face)
    ));
    if let Some(buckling) = work.slender() {
        let safety = buckling.force / findings.assembly.press.tightest.peak_force;
        let formula = if buckling.is_euler { "Euler" } else { "Johnson" };
        all.push(format!(
            "Free-standing the {} gives way at {}, {} times the peak (slenderness {}, {formula}).",
            shaft.name,
            show(Measure::Force, buckling.force, system),
            crate::quantity::factor_found(safety),
            number(buckling.slenderness, 3)
        ));
    }
    all
}

fn warming(findings: &Findings, work: &PressWorkFindings) -> String {
    let Some(heating) = &work.heating else { return String::new() };
    let rise = |kelvin: f64| show(Measure::TemperatureDifference, kelvin, findings.joint.display);
    format!(
        ", which warms the seat by about {} at {} mm/s and the parts by {}",
        rise(heating.interface_rise),
        number(PRESS_SPEED * 1e3, 2),
        rise(heating.even_rise)
    )
}

fn face_text(findings: &Findings, name: &str, face: &FaceFindings) -> String {
    let stress = show(Measure::Pressure, face.stress, findings.joint.display);
    match face.safety {
        Some(safety) => format!("{name} {stress}, safety {}", crate::quantity::factor_found(safety)),
        None => format!("{name} {stress}"),
    }
}

/// How the joint comes apart.
pub fn release(findings: &Findings) -> Vec<String> {
    let Some(work) = &findings.assembly.press_work else { return Vec::new() };
    let joint = &findings.joint;
    let (shaft, hub) = joint.joined_last();
    let system = joint.display;
    let force = |newtons| show(Measure::Force, newtons, system);
    let push = &work.push_out;
    let lag = number(joint.assembly.practice.temperature_lag * 100.0, 3);
    let heat = match &work.release {
        Ok(temperature) => format!(
            "The tightest pair lets go when the {} is at {} and the {} {lag} % behind in warming{}.",
            hub.name,
            show(Measure::Temperature, *temperature, system),
            shaft.name,
            above_limit(findings, *temperature)
        ),
        Err(why) => {
            format!("Heat alone does not free it with the {} {lag} % behind in warming: {why}.", shaft.name)
        }
    };
    let overlap = if push.sliding.high > push.first_movement.high {
        " (the published bands of both frictions overlap: it slides with no more than it starts with)"
    } else {
        ""
    };
    let mut all = vec![
        format!(
            "After rest the tightest pair takes {} to {} to start and {} to {} to keep sliding{overlap}; look for a press of {}.",
            force(push.first_movement.low),
            force(push.first_movement.high),
            force(push.sliding.low),
            force(push.sliding.high),
            force(push.press)
        ),
        heat,
    ];
    all.extend(oil(findings));
    all
}

/// Oil pressed between the seats: the pressure at both extremes, the film, and what both parts have left.
pub fn oil(findings: &Findings) -> Vec<String> {
    let Some(found) = &findings.assembly.oil else { return Vec::new() };
    let joint = &findings.joint;
    let (shaft, hub) = joint.joined_last();
    let pressure = |si: f64| show(Measure::Pressure, si, joint.display).to_string();
    let tight = &found.tightest;
    let (from, plan) = match &found.loosest {
        Some(loose) => (
            format!(
                "{} at the loosest and {} at the tightest pair",
                pressure(loose.least),
                pressure(tight.least)
            ),
            format!("{} and {}", pressure(loose.planned), pressure(tight.planned)),
        ),
        None => (
            format!("{} at the tightest pair; the loosest slides without", pressure(tight.least)),
            pressure(tight.planned),
        ),
    };
    let left = [(&hub.name, tight.hub_safety), (&shaft.name, tight.shaft_safety)];
    let left: Vec<String> = left
        .into_iter()
        .filter_map(|(name, safety)| {
            Some(format!("a safety of {} to the {name}", crate::quantity::factor_found(safety?)))
        })
        .collect();
    let safeties =
        if left.is_empty() { String::new() } else { format!(", which leaves {}", left.join(" and ")) };
    vec![
        format!(
            "Oil fed between the seats floats the {} above their contact pressure: {from}. Plan {plan}, {} times that ({}).",
            hub.name,
            number(OIL_PLANNED, 2),
            OIL_SOURCE
        ),
        format!(
            "At the tightest pair the seats then part by {} on the diameter{safeties}.{}",
            show(Measure::Deviation, tight.film, joint.display),
            oil_limit(findings, tight)
        ),
    ]
}

/// The pressure that a part stands, when it is near enough to matter: the pump could pass it.
fn oil_limit(findings: &Findings, pair: &OilPair) -> String {
    let (shaft, hub) = findings.joint.joined_last();
    let (Some(limit), pressure) =
        (pair.limit(), |si: f64| show(Measure::Pressure, si, findings.joint.display))
    else {
        return String::new();
    };
    let part = if pair.hub_limit == Some(limit) { &hub.name } else { &shaft.name };
    format!(" More than {} of oil overstrains the {part}.", pressure(limit))
}

fn above_limit(findings: &Findings, temperature: f64) -> String {
    match &findings.assembly.hub_limit {
        Some((limit, reason)) if temperature > *limit => format!(
            ", above the {} that it may have ({reason})",
            show(Measure::Temperature, *limit, findings.joint.display)
        ),
        _ => String::new(),
    }
}
