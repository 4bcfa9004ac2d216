//! Rotating bending of the shaft at the hub edge.

use super::Findings;
use crate::joint::{DutyState, Joint};
use crate::material::{Family, Range};
use crate::mechanics::{MechanicsError, fatigue, notch};

/// Strength of a small polished bar of steel in rotating bending as a share of its tensile strength: 0.45 to 0.5 is
/// usual; from memory.
pub const PLAIN_SHARE: f64 = 0.45;

/// Notch factors found in tests on pressed members in reversed bending: one half to one third of the plain strength
/// (Horger & Maulbetsch, J. Applied Mechanics 3 (1936) A91-A98, abstract).
pub const TESTED_NOTCH: Range = Range { low: 2.0, high: 3.0 };

/// Diameter of the shafts in those tests, m: 2 in.
pub const TESTED_DIAMETER: f64 = 0.0508;

/// Rotating bending of the shaft at the hub edge.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Fatigue {
    /// Index of the duty state.
    pub state: usize,
    /// Nominal bending stress of the shaft, Pa.
    pub nominal_stress: f64,
    /// Notch factor at the hub edge by DIN 743-2, carried over to this diameter; none for a shaft outside its table.
    pub formula_notch: Option<f64>,
    /// Notch factor at the hub edge, by DIN 743-2 and the range of tests, at this diameter.
    pub notch_factor: Range,
    /// Share of the strength that the size of the shaft leaves.
    pub size_factor: f64,
    /// Share that the roughness of its seat leaves.
    pub surface_factor: f64,
    /// By what the strength of the small bar is divided, over the range of the notch factor.
    pub reduction: Range,
    /// Strength of a small polished bar in rotating bending, Pa: a share of the tensile strength.
    pub plain_strength: f64,
    /// Safety over the range of the notch factor.
    pub safety: Range,
}

/// Each state with rotating bending; none for a shaft that the published figures do not speak of.
pub(super) fn fatigue(joint: &Joint) -> Result<Vec<Fatigue>, MechanicsError> {
    let Ok(tensile) = tensile_strength(joint) else { return Ok(Vec::new()) };
    let states = joint.duty.iter().enumerate().filter(|(_, state)| bends(state));
    states.map(|(index, state)| of_state(joint, index, state, tensile)).collect()
}

fn bends(state: &DutyState) -> bool {
    state.rotating_bending && state.bending_moment > 0.0
}

/// Tensile strength of a shaft that the published figures speak of, Pa, or why they do not speak of it.
///
/// They are of steel shafts; one whose family is not stated counts as steel.
fn tensile_strength(joint: &Joint) -> Result<f64, String> {
    let (shaft, _) = joint.shaft_and_hub();
    let name = &shaft.material.name;
    let steel = [Family::Steel, Family::CastSteel, Family::StainlessSteel, Family::Other];
    if !steel.contains(&shaft.material.family) {
        return Err(format!("the published notch factors are of steel shafts, not of {name}"));
    }
    let tensile = shaft.strength.tensile_strength.ok_or(format!("no tensile strength of {name} is known"))?;
    let judged = fatigue::surface_factor(ground(shaft.roughness.value), tensile);
    judged.map(|_| tensile).map_err(|cause| cause.to_string())
}

/// A surface smoother than Rz 1 µm keeps all of the strength.
fn ground(roughness: f64) -> f64 {
    roughness.max(1e-6)
}

/// Nominal bending stress of the shaft at the hub's edges for each unit of bending moment, 32 d/(π (d⁴ − b⁴)), 1/m³; twice the
/// torsional stress for each unit of torque.
pub(super) fn stress_per_moment(joint: &Joint) -> f64 {
    let (outer, bore) = (joint.shaft_and_hub().0.outer_diameter, bore_at_the_edges(joint));
    32.0 * outer / (std::f64::consts::PI * (outer.powi(4) - bore.powi(4)))
}

/// Bore of the shaft at the hub's edges, m: of a stepped joint the greater of both ends, where the section is weaker.
pub(super) fn bore_at_the_edges(joint: &Joint) -> f64 {
    let ends = joint.slices.first().into_iter().chain(joint.slices.last());
    ends.map(|slice| slice.shaft_bore).reduce(f64::max).unwrap_or(joint.shaft_and_hub().0.inner_diameter)
}

fn of_state(joint: &Joint, index: usize, state: &DutyState, tensile: f64) -> Result<Fatigue, MechanicsError> {
    let (shaft, _) = joint.shaft_and_hub();
    let outer = shaft.outer_diameter;
    let nominal_stress = stress_per_moment(joint) * state.bending_moment;
    let formula_notch = match notch::press_fit_bending(tensile) {
        Ok(factor) => Some(fatigue::notch_factor_at(factor, notch::REFERENCE_DIAMETER, outer)?),
        Err(_) => None,
    };
    let tested = |factor| fatigue::notch_factor_at(factor, TESTED_DIAMETER, outer);
    let (low, high) = (tested(TESTED_NOTCH.low)?, tested(TESTED_NOTCH.high)?);
    let notch_factor = Range {
        low: formula_notch.map_or(low, |factor| factor.min(low)),
        high: formula_notch.map_or(high, |factor| factor.max(high)),
    };
    let size_factor = fatigue::size_factor(outer)?;
    let surface_factor = fatigue::surface_factor(ground(shaft.roughness.value), tensile)?;
    let reduction = Range {
        low: fatigue::reduction(notch_factor.low, size_factor, surface_factor)?,
        high: fatigue::reduction(notch_factor.high, size_factor, surface_factor)?,
    };
    let plain_strength = PLAIN_SHARE * tensile;
    Ok(Fatigue {
        state: index,
        nominal_stress,
        formula_notch,
        notch_factor,
        size_factor,
        surface_factor,
        reduction,
        plain_strength,
        safety: Range {
            low: plain_strength / (reduction.high * nominal_stress),
            high: plain_strength / (reduction.low * nominal_stress),
        },
    })
}

/// Why a state that bends the shaft as it turns has no figures of fatigue; a full sentence.
pub(super) fn note(findings: &Findings) -> Option<String> {
    let joint = &findings.joint;
    let (shaft, _) = joint.shaft_and_hub();
    let reason = tensile_strength(joint).err().filter(|_| joint.duty.iter().any(bends))?;
    Some(format!("The fatigue of the {} at the hub edge is not judged: {reason}.", shaft.name))
}
