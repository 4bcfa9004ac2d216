//! The joints of several rings that are made before the last one: what force or which temperature each of them takes.

use super::assembly_of::{bath_temperature, hub_limit};
use super::{FindingsError, OrderStep, after_smoothing};
use crate::assembly::joining::Joining;
use crate::assembly::press::{self, PressInput};
use crate::joint::{Joint, Ring, SmoothingAt};
use crate::tolerance::Extremes;

/// A joint that is made before the last one, at the tightest pair.
#[derive(Debug, Clone, PartialEq)]
pub struct EarlierJoint {
    /// The interface.
    pub interface: usize,
    /// Diametral overlap of the parts at the shop temperature, with what earlier joints have strained, m.
    pub overlap: f64,
    /// Greatest press force, at the high friction, N.
    pub press_force: f64,
    /// Temperature to which the outer part must be heated alone, K; none when its curve ends before.
    pub hub_temperature: Option<f64>,
    /// Temperature to which the outer part must be heated beside the bath asked for, K; none when that cannot do it.
    pub hub_temperature_in_bath: Option<f64>,
    /// Whether the bath asked for clears alone.
    pub bath_alone: bool,
    /// Highest temperature of the outer ring, K.
    pub hub_limit: Option<f64>,
}

/// Every joint but the last, in the order in which they are made.
pub(super) fn earlier(joint: &Joint, steps: &[OrderStep]) -> Result<Vec<EarlierJoint>, FindingsError> {
    let Some((_, before)) = steps.split_last() else { return Ok(Vec::new()) };
    before.iter().filter_map(|step| earlier_joint(joint, step).transpose()).collect()
}

fn earlier_joint(joint: &Joint, step: &OrderStep) -> Result<Option<EarlierJoint>, FindingsError> {
    let index = step.interface;
    let (Some(shaft), Some(hub), Some(fit)) =
        (joint.rings.get(index), joint.rings.get(index + 1), joint.fits.get(index))
    else {
        return Ok(None);
    };
    let diameter = joint.interface_diameter(index);
    let shop = joint.assembly.shop_temperature;
    let overlap = step.overlap.max(0.0);
    let press_force = press::peak_force(&PressInput {
        pressure: if overlap > 0.0 { step.pressure } else { 0.0 },
        interference: overlap,
        diameter,
        length: joint.engaged_length(),
        friction: joint.friction.pressing.value.high,
        chamfer_angle: joint.assembly.chamfer_angle.value,
    })?;
    let strain = |ring: &Ring| ring.material.expansion.strain(shop).unwrap_or(0.0);
    let made: Extremes<f64> = fit.limits.interference();
    // What smoothing takes grips no more, but it has to pass all the same.
    let smoothed = if joint.smoothing.at == SmoothingAt::Both {
        let loss = joint.smoothing.loss.get(index).copied().unwrap_or(0.0);
        made.tightest - after_smoothing(made.tightest, loss)
    } else {
        0.0
    };
    let by_temperature = diameter * (strain(shaft) - strain(hub));
    let hub_limit = hub_limit(joint, hub).map(|(limit, _)| limit);
    let joining = Joining {
        diameter,
        interference: step.overlap + smoothed - by_temperature,
        clearance: joint.assembly.clearance_to_open(),
        hub: &hub.material.expansion,
        shaft: &shaft.material.expansion,
        shop_temperature: shop,
        hub_limit,
    };
    let heated = joining.heat_hub(shop)?;
    let bath = joining.bath(bath_temperature(joint.assembly.bath))?;
    let beside = bath.hub.as_ref().filter(|hub| hub.possible()).and_then(|hub| hub.temperature);
    Ok(Some(EarlierJoint {
        interface: index,
        overlap: step.overlap,
        press_force,
        hub_temperature: heated.temperature,
        hub_temperature_in_bath: if bath.alone { Some(shop) } else { beside },
        bath_alone: bath.alone,
        hub_limit,
    }))
}
