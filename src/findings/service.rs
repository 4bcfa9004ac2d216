//! The joint at work: what loosens it, and what yielding by design gives.

use super::condition::Condition;
use super::fatigue::{Fatigue, fatigue};
use super::kernel::{Kernel, PairInterference};
use super::{DutyFindings, FindingsError, InterfaceFindings, PairFindings, RingStress};
use crate::joint::{Joint, Ring};
use crate::material::Kind;
use crate::mechanics::buckling::Liner;
use crate::mechanics::criteria::DuctileCriterion;
use crate::mechanics::finite_length::{LengthFactors, ShaftEnds, length_factors};
use crate::mechanics::governing::{Extreme, StackQuantity, StressMeasure};
use crate::mechanics::plastic::{HubYield, PlasticJoint, PlasticLimits, PlasticState};
use crate::mechanics::stack::Stack;
use crate::mechanics::temperature::parting_temperature;
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
    /// The combination of loosest and tightest interferences that governs each ring; empty with two rings.
    pub governing: Vec<GoverningRing>,
    /// Pressure at the mean and at a sharp edge over the thick-walled cylinder; none outside its validity.
    pub length_factors: Option<LengthFactors>,
    /// The innermost part under pressure from outside; none unless it is a tube with a thin wall.
    pub liner: Option<ThinLiner>,
    /// Fatigue of the shaft at the hub edge for each state with rotating bending.
    pub fatigue: Vec<Fatigue>,
}

/// Which extreme of each interference governs the strength of a ring.
#[derive(Debug, Clone, PartialEq)]
pub struct GoverningRing {
    /// Whether each interface is at its tightest, innermost first; otherwise at its loosest.
    pub tight: Vec<bool>,
    /// Name of the duty state, or none for the shop temperature.
    pub state: Option<usize>,
    /// Greatest equivalent stress at either face, Pa.
    pub equivalent: f64,
    /// Strength over it; none without strength or stress.
    pub safety: Option<f64>,
}

/// The wall of a thin bush, which the housing presses inwards. Pressures Pa.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct ThinLiner {
    /// Wall over mean diameter.
    pub slenderness: f64,
    /// Contact pressure of the tightest pair at the shop temperature or in the state that brings it nearest to buckling.
    pub pressure: f64,
    /// Pressure below which the wall cannot buckle even by itself, with the modulus that it has there.
    pub free: f64,
    /// Pressure at which it buckles inwards though the housing holds it round.
    pub housed: f64,
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
    /// The mean pair.
    pub mean: PlasticState,
    /// The tightest pair.
    pub tightest: PlasticState,
    /// What the states leave of the hub; none unless it may yield by design.
    pub worn: Option<WornHub>,
    /// The solved joint, for curves.
    pub joint: PlasticJoint,
}

/// A hub that has been through the hardest of all states, at the loosest and the tightest pair.
///
/// Its bore stays larger by its permanent growth, and from then on the joint is elastic with an interference that is
/// less by it.
#[derive(Debug, Clone, PartialEq)]
pub struct WornHub {
    /// Permanent growth of the bore of the loosest pair, m.
    pub loosest: f64,
    /// Permanent growth of the bore of the tightest pair, m.
    pub tightest: f64,
    /// The hub of the tightest pair under its hardest load.
    pub hardest: PlasticState,
    /// Index of the state with that load; none when it is the assembly.
    pub state: Option<usize>,
}

/// The rings after one step of assembly.
#[derive(Debug, Clone, PartialEq)]
pub struct OrderStep {
    /// The interface that is joined in this step.
    pub interface: usize,
    /// Diametral overlap of the parts there before the step, at the shop temperature, m: with what the steps before have
    /// strained.
    pub overlap: f64,
    /// Contact pressure there after the step, Pa.
    pub pressure: f64,
    /// Stress in each ring; rings that are not joined yet are free of stress.
    pub rings: Vec<RingStress>,
}

/// Service findings of a joint.
pub(super) fn service(
    joint: &Joint,
    kernel: &Kernel<'_>,
    pairs: &Extremes<PairInterference>,
    tightest: &PairFindings,
    duty: &[DutyFindings],
    plastic: Option<PlasticFindings>,
) -> Result<ServiceFindings, FindingsError> {
    let loosening = loosening(joint, kernel, &pairs.loosest)?;
    let (shaft, hub) = joint.shaft_and_hub();
    let slenderness = joint.engaged_length() / joint.diameter;
    let ratio = joint.diameter / hub.outer_diameter;
    let simple = joint.rings.len() == 2 && joint.slices.is_empty() && shaft.inner_diameter == 0.0;
    Ok(ServiceFindings {
        liner: liner(joint, kernel, tightest, duty)?,
        loosening,
        plastic,
        steps: steps(joint, kernel, &pairs.tightest)?,
        governing: governing(joint, kernel, pairs)?,
        length_factors: if simple {
            length_factors(slenderness, ratio, ShaftEnds::Through).ok()
        } else {
            None
        },
        fatigue: fatigue(joint)?,
    })
}

/// Speed and temperatures that open each interface of the loosest pair; of a stepped joint the speed at which the
/// first slice opens (the temperatures open every slice alike).
fn loosening(
    joint: &Joint,
    kernel: &Kernel<'_>,
    loosest: &PairInterference,
) -> Result<Vec<Loosening>, FindingsError> {
    let stack = kernel.stack(&loosest.grip, &kernel.shop)?;
    let mut speeds = stack.loosening_speeds()?;
    for other in kernel.stacks(&loosest.grip, &kernel.shop)?.iter().skip(1) {
        for (speed, own) in speeds.iter_mut().zip(other.loosening_speeds()?) {
            *speed = match (*speed, own) {
                (Some(known), Some(own)) => Some(known.min(own)),
                (known, own) => known.or(own),
            };
        }
    }
    let shop = joint.assembly.shop_temperature;
    let search = |interface: usize, heated: &dyn Fn(usize) -> bool| -> Result<Option<f64>, FindingsError> {
        let at = |temperature: f64| {
            let temperatures: Vec<f64> =
                (0..joint.rings.len()).map(|ring| if heated(ring) { temperature } else { shop }).collect();
            let hot = Condition::resting(joint, temperatures)
                .and_then(|condition| kernel.stack(&loosest.grip, &condition));
            // Within the curves there is no error; beyond them a strain that is no number is refused.
            Ok(hot.unwrap_or_else(|_| Stack {
                free_strain: vec![f64::NAN; joint.rings.len()],
                ..stack.clone()
            }))
        };
        let moved = joint.rings.iter().enumerate().filter(|(ring, _)| heated(*ring));
        let limits = moved.map(|(_, ring)| ring.material.temperature_range().1);
        let end = limits.fold(f64::INFINITY, f64::min);
        if end <= shop {
            return Ok(None);
        }
        if let [inner, outer] = joint.rings.as_slice() {
            let made = loosest.grip.first().copied().unwrap_or_default();
            let strain = |ring: &Ring, temperature: f64| {
                // Within the curves there is no error; beyond them nothing is known to part the rings.
                ring.material.expansion.strain(temperature).unwrap_or(f64::NAN)
            };
            let overlap = |temperature: f64| {
                let inner = strain(inner, if heated(0) { temperature } else { shop });
                Ok(made + joint.diameter * (inner - strain(outer, temperature)))
            };
            return Ok(parting_temperature(overlap, shop, end)?);
        }
        Ok(stack.loosening_temperature_of(interface, at, shop, end)?)
    };
    speeds
        .into_iter()
        .enumerate()
        .map(|(interface, speed)| {
            Ok(Loosening {
                speed,
                temperature: search(interface, &|_| true)?,
                outer_temperature: search(interface, &|ring| ring > interface)?,
            })
        })
        .collect()
}

/// The combination that governs each ring, over the shop temperature and every state; nothing with two rings, where
/// the tightest pair governs.
fn governing(
    joint: &Joint,
    kernel: &Kernel<'_>,
    pairs: &Extremes<PairInterference>,
) -> Result<Vec<GoverningRing>, FindingsError> {
    if joint.rings.len() == 2 {
        return Ok(Vec::new());
    }
    let mut conditions = vec![(None, kernel.shop.clone())];
    for (index, state) in joint.duty.iter().enumerate() {
        conditions.push((Some(index), Condition::of_state(joint, state)?));
    }
    (0..joint.rings.len()).map(|ring| governing_ring(joint, kernel, pairs, &conditions, ring)).collect()
}

fn governing_ring(
    joint: &Joint,
    kernel: &Kernel<'_>,
    pairs: &Extremes<PairInterference>,
    conditions: &[(Option<usize>, Condition)],
    index: usize,
) -> Result<GoverningRing, FindingsError> {
    let ring = &joint.rings[index];
    let (measure, strength) = match (ring.material.kind, joint.criterion) {
        (Kind::Brittle, _) => {
            let tension_share = ring.tension_share();
            (StressMeasure::Brittle { tension_share }, ring.strength.tensile_strength)
        }
        (_, DuctileCriterion::VonMises) => (StressMeasure::VonMises, ring.strength.yield_strength),
        (_, DuctileCriterion::Tresca) => (StressMeasure::Tresca, ring.strength.yield_strength),
    };
    let loosest = loosest_for_stress(pairs);
    let mut worst = GoverningRing { tight: Vec::new(), state: None, equivalent: -1.0, safety: None };
    for (state, condition) in conditions {
        let stack = kernel.stack(&pairs.tightest.effective, condition)?;
        for radius in [0.5 * ring.inner_diameter, 0.5 * ring.outer_diameter] {
            let quantity = StackQuantity::Stress { ring: index, radius, measure };
            let found = stack.governing(&loosest, &pairs.tightest.effective, quantity, Extreme::Greatest)?;
            if found.value > worst.equivalent {
                worst.equivalent = found.value;
                worst.tight = found.tight;
                worst.state = *state;
            }
        }
    }
    worst.safety = strength.filter(|_| worst.equivalent > 0.0).map(|strength| strength / worst.equivalent);
    Ok(worst)
}

/// The loosest interferences, never above the tightest.
pub(super) fn loosest_for_stress(pairs: &Extremes<PairInterference>) -> Vec<f64> {
    let both = pairs.loosest.effective.iter().zip(&pairs.tightest.effective);
    both.map(|(loosest, tightest)| loosest.min(*tightest)).collect()
}

/// The innermost part as a thin liner, in the condition that brings it nearest to buckling: both its pressures are
/// proportional to its modulus there.
fn liner(
    joint: &Joint,
    kernel: &Kernel<'_>,
    tightest: &PairFindings,
    duty: &[DutyFindings],
) -> Result<Option<ThinLiner>, FindingsError> {
    let Some(bush) = joint.rings.first() else { return Ok(None) };
    let innermost = |interfaces: &[InterfaceFindings]| interfaces.first().map_or(0.0, |found| found.pressure);
    let of_shop = kernel.shop.youngs_moduli(joint)?;
    let states = duty.iter().map(|state| (innermost(&state.tightest.interfaces), &state.youngs_moduli));
    let shop = (innermost(&tightest.interfaces), &of_shop);
    let conditions = std::iter::once(shop).chain(states);
    let conditions =
        conditions.filter_map(|(pressure, moduli)| moduli.first().map(|modulus| (pressure, *modulus)));
    let Some((pressure, youngs_modulus)) =
        conditions.reduce(|worst, own| if own.0 / own.1 > worst.0 / worst.1 { own } else { worst })
    else {
        return Ok(None);
    };
    let liner = Liner {
        inner_diameter: bush.inner_diameter,
        outer_diameter: bush.outer_diameter,
        youngs_modulus,
        poisson: bush.material.poisson.value,
    };
    let (Ok(free), Ok(housed)) = (liner.free_pressure(), liner.housed_pressure()) else { return Ok(None) };
    Ok(Some(ThinLiner { slenderness: liner.slenderness(), pressure, free, housed }))
}

/// The elastic-plastic joint; none unless a ductile hub sits on a shaft of two rings of one section.
pub(super) fn plastic(
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
    let moduli = kernel.shop.youngs_moduli(joint)?;
    let [shaft_youngs_modulus, hub_youngs_modulus] = moduli.as_slice() else { return Ok(None) };
    let solved = PlasticJoint::new(HubYield {
        rings: TwoRings {
            diameter: joint.diameter,
            hub_outer_diameter: hub.outer_diameter,
            shaft_bore: shaft.inner_diameter,
            hub_youngs_modulus: *hub_youngs_modulus,
            hub_poisson: hub.material.poisson.value,
            shaft_youngs_modulus: *shaft_youngs_modulus,
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
    let states = (at(&pairs.loosest), at(&pairs.mean), at(&pairs.tightest));
    let (Some(loosest), Some(mean), Some(tightest)) = states else { return Ok(None) };
    Ok(Some(PlasticFindings { limits: *solved.limits(), loosest, mean, tightest, worn: None, joint: solved }))
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
            let made = tightest.effective.get(*joined).copied().unwrap_or_default();
            if let Some(own) = interference.get_mut(*joined) {
                *own = made;
            }
            let together = kernel.stack(&interference, &kernel.shop)?.solve()?;
            Ok(OrderStep {
                interface: *joined,
                overlap: kernel.overlap(*joined, &interference)?,
                pressure: together.pressures.get(*joined).copied().unwrap_or_default(),
                rings: kernel.ring_stresses(&interference, &kernel.shop)?,
            })
        })
        .collect()
}
