//! The joint at work: what loosens it, and what yielding by design gives.

use super::kernel::{Kernel, PairInterference};
use super::{FindingsError, RingStress};
use crate::joint::Joint;
use crate::material::Kind;
use crate::mechanics::plastic::{HubYield, PlasticJoint, PlasticLimits, PlasticState};
use crate::mechanics::two_rings::TwoRings;
use crate::tolerance::Extremes;

/// What speed, heat, yielding and order of assembly do.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct ServiceFindings {
    /// What opens each interface of the loosest pair, from the innermost outwards.
    pub loosening: Vec<Loosening>,
    /// The elastic-plastic hub at the tightest pair; none when it does not apply.
    pub plastic: Option<PlasticFindings>,
    /// Stresses after each step of assembly at the tightest pair; empty with two rings.
    pub steps: Vec<OrderStep>,
}

/// What opens one interface of the loosest pair.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Loosening {
    /// Angular speed at shop temperature, rad/s; none when no speed opens it.
    pub speed: Option<f64>,
    /// Temperature of all parts, at rest, K; none when none within the expansion data opens it.
    pub temperature: Option<f64>,
    /// Temperature of the parts outside it alone, the others at shop temperature, at rest, K.
    pub outer_temperature: Option<f64>,
}

/// The hub beyond its elastic limit, at rest, at the shop temperature.
#[derive(Debug, Clone, PartialEq)]
pub struct PlasticFindings {
    /// Where yield begins and where the pressure ends.
    pub limits: PlasticLimits,
    /// The loosest pair.
    pub loosest: PlasticState,
    /// The tightest pair.
    pub tightest: PlasticState,
    /// The solved joint, for curves.
    pub joint: PlasticJoint,
}

/// The rings after one step of assembly.
#[derive(Debug, Clone, PartialEq)]
pub struct OrderStep {
    /// The interface that is joined in this step.
    pub interface: usize,
    /// Stress in each ring; rings that are not joined yet are free of stress.
    pub rings: Vec<RingStress>,
}

/// Service findings of a joint.
pub(super) fn service(
    joint: &Joint,
    kernel: &Kernel<'_>,
    pairs: &Extremes<PairInterference>,
) -> Result<ServiceFindings, FindingsError> {
    Ok(ServiceFindings {
        loosening: Vec::new(),
        plastic: plastic(joint, kernel, pairs)?,
        steps: steps(joint, kernel, &pairs.tightest)?,
    })
}

/// The elastic-plastic joint; none unless a ductile hub sits on a shaft of two rings of one section.
fn plastic(
    joint: &Joint,
    kernel: &Kernel<'_>,
    pairs: &Extremes<PairInterference>,
) -> Result<Option<PlasticFindings>, FindingsError> {
    let [shaft, hub] = joint.rings.as_slice() else { return Ok(None) };
    let (Some(hub_yield), Some(shaft_yield)) = (hub.strength.yield_strength, shaft.strength.yield_strength)
    else {
        return Ok(None);
    };
    if !joint.slices.is_empty() || hub.material.kind != Kind::Ductile || shaft.material.kind != Kind::Ductile
    {
        return Ok(None);
    }
    let solved = PlasticJoint::new(HubYield {
        rings: TwoRings {
            diameter: joint.diameter,
            hub_outer_diameter: hub.outer_diameter,
            shaft_bore: shaft.inner_diameter,
            hub_youngs_modulus: hub.material.youngs_modulus.value,
            hub_poisson: hub.material.poisson.value,
            shaft_youngs_modulus: shaft.material.youngs_modulus.value,
            shaft_poisson: shaft.material.poisson.value,
        },
        rule: joint.require.yield_rule,
        hub_yield_strength: hub_yield,
        shaft_yield_strength: shaft_yield,
    })?;
    let strain = |ring: usize| kernel.shop.strain.get(ring).copied().unwrap_or(0.0);
    let by_temperature = (strain(0) - strain(1)) * joint.diameter;
    let at = |pair: &PairInterference| {
        let interference = pair.effective.first().copied().unwrap_or(0.0) + by_temperature;
        solved.solve(interference.max(0.0)).ok()
    };
    let (Some(loosest), Some(tightest)) = (at(&pairs.loosest), at(&pairs.tightest)) else { return Ok(None) };
    Ok(Some(PlasticFindings { limits: *solved.limits(), loosest, tightest, joint: solved }))
}

/// Clearance that keeps parts apart which are not joined yet, as a share of the diameter.
const APART: f64 = 0.1;

/// The rings of the tightest pair after each step of assembly, at the shop temperature.
fn steps(
    joint: &Joint,
    kernel: &Kernel<'_>,
    tightest: &PairInterference,
) -> Result<Vec<OrderStep>, FindingsError> {
    if joint.rings.len() == 2 {
        return Ok(Vec::new());
    }
    let mut interference: Vec<f64> =
        (0..joint.fits.len()).map(|k| -APART * joint.interface_diameter(k)).collect();
    joint
        .order
        .iter()
        .map(|joined| {
            if let (Some(own), Some(made)) = (interference.get_mut(*joined), tightest.effective.get(*joined))
            {
                *own = *made;
            }
            Ok(OrderStep { interface: *joined, rings: kernel.ring_stresses(&interference, &kernel.shop)? })
        })
        .collect()
}
