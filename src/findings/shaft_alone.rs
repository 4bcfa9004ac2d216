//! The shaft by itself, beside the fit: its torsion and bending are no part of the verdicts, but a shaft that cannot bear them is
//! named.

use super::fatigue::stress_per_moment;
use super::{Caution, Findings};
use crate::joint::{DutyState, Joint};
use crate::quantity::{Measure, factor_found, show};

/// Cautions for a shaft that its own load or its fatigue brings near its strength.
pub(super) fn cautions(findings: &Findings) -> Vec<Caution> {
    let joint = &findings.joint;
    let mut all: Vec<Caution> = joint.duty.iter().filter_map(|state| nominal(joint, state)).collect();
    all.extend(fatigue(findings));
    all
}

/// Nominal torsion and bending of the shaft at the hub's edge, by von Mises, against its yield strength.
fn nominal(joint: &Joint, state: &DutyState) -> Option<Caution> {
    let (shaft, _) = joint.shaft_and_hub();
    let strength = shaft.strength.yield_strength?;
    let per_moment = stress_per_moment(joint);
    let (bending, torsion) = (per_moment * state.bending_moment, 0.5 * per_moment * state.torque);
    let stress = (bending * bending + 3.0 * torsion * torsion).sqrt();
    if stress * joint.require.yield_safety <= strength {
        return None;
    }
    let pressure = |pascals| show(Measure::Pressure, pascals, joint.display);
    Some(Caution {
        subject: "strength",
        text: format!(
            "If the {} carries the torque and bending moment of {} by itself, they stress it with {} at the hub's edge \
             (nominal, without the fit and without notch), {} against its yield strength of {}; the verdicts judge the fit, not \
             the shaft beside it.",
            shaft.name,
            state.called(),
            pressure(stress),
            factor_found(strength / stress),
            pressure(strength),
        ),
        source: "torsion and bending of a round bar; von Mises criterion".to_owned(),
        usual: false,
    })
}

fn fatigue(findings: &Findings) -> Vec<Caution> {
    let joint = &findings.joint;
    let (shaft, _) = joint.shaft_and_hub();
    let low = findings.service.fatigue.iter().filter(|found| found.safety.low < 1.0);
    low.filter_map(|found| {
        let state = joint.duty.get(found.state)?;
        Some(Caution {
            subject: "strength",
            text: format!(
                "Rotating bending in {} may break the {} at the hub's edge: its safety against fatigue is {} to {} over the \
                 published notch factors.",
                state.called(),
                shaft.name,
                factor_found(found.safety.low),
                factor_found(found.safety.high),
            ),
            source: "DIN 743 (from memory); Horger & Maulbetsch, J. Applied Mechanics 3 (1936)".to_owned(),
            usual: false,
        })
    })
    .collect()
}
