//! One pair of parts: pressures, stresses, capacities.

use serde::Serialize;

use super::number::{finite, mega, microns, millimetres};
use crate::findings::{InterfaceFindings, PairFindings, RingStress, SliceFindings};
use crate::joint::Joint;

/// One pair at the shop temperature, at rest. `hub_` is the outermost ring, `shaft_` the innermost.
#[derive(Serialize)]
pub(super) struct Pair {
    interference_um: f64,
    smoothing_um: f64,
    effective_interference_um: f64,
    shop_interference_um: f64,
    pressure_mpa: Option<f64>,
    pressure_smoothed_mpa: Option<f64>,
    pressure_unsmoothed_mpa: Option<f64>,
    hub_bore_hoop_mpa: Option<f64>,
    hub_bore_radial_mpa: Option<f64>,
    hub_bore_von_mises_mpa: Option<f64>,
    hub_rim_hoop_mpa: Option<f64>,
    shaft_surface_hoop_mpa: Option<f64>,
    shaft_bore_hoop_mpa: Option<f64>,
    shaft_von_mises_mpa: Option<f64>,
    torque_capacity_nm: Option<f64>,
    axial_capacity_n: Option<f64>,
    press_force_n: Option<f64>,
    press_force_low_n: Option<f64>,
    release_force_n: Option<f64>,
    release_force_low_n: Option<f64>,
    interfaces: Vec<Interface>,
    rings: Vec<Ring>,
    slices: Vec<Slice>,
}

/// One interface.
#[derive(Serialize)]
pub(super) struct Interface {
    diameter_mm: f64,
    interference_um: f64,
    effective_interference_um: f64,
    pressure_mpa: Option<f64>,
    gap_um: f64,
    open: bool,
    torque_capacity_nm: Option<f64>,
    axial_capacity_n: Option<f64>,
}

/// One ring; of a solid ring `bore` is the centre.
#[derive(Serialize)]
pub(super) struct Ring {
    name: String,
    bore_hoop_mpa: Option<f64>,
    bore_radial_mpa: Option<f64>,
    bore_von_mises_mpa: Option<f64>,
    rim_hoop_mpa: Option<f64>,
    rim_radial_mpa: Option<f64>,
    rim_von_mises_mpa: Option<f64>,
    equivalent_mpa: Option<f64>,
    strength_mpa: Option<f64>,
    yield_safety: Option<f64>,
    bore_change_um: Option<f64>,
    outer_change_um: Option<f64>,
}

/// One slice along a stepped joint.
#[derive(Serialize)]
struct Slice {
    length_mm: f64,
    hub_outer_diameter_mm: f64,
    shaft_bore_mm: f64,
    pressure_mpa: Option<f64>,
    rings: Vec<Ring>,
}

impl Pair {
    pub(super) fn of(joint: &Joint, pair: &PairFindings) -> Self {
        let shaft = |value: fn(&RingStress) -> f64| pair.rings.first().and_then(|ring| mega(value(ring)));
        let hub = |value: fn(&RingStress) -> f64| pair.rings.last().and_then(|ring| mega(value(ring)));
        Self {
            interference_um: microns(pair.interference),
            smoothing_um: microns(pair.smoothing),
            effective_interference_um: microns(pair.effective_interference),
            shop_interference_um: microns(pair.shop_interference),
            pressure_mpa: mega(pair.pressure),
            pressure_smoothed_mpa: mega(pair.pressure_smoothed),
            pressure_unsmoothed_mpa: mega(pair.pressure_unsmoothed),
            hub_bore_hoop_mpa: hub(|ring| ring.bore.hoop),
            hub_bore_radial_mpa: hub(|ring| ring.bore.radial),
            hub_bore_von_mises_mpa: hub(|ring| ring.bore.von_mises),
            hub_rim_hoop_mpa: hub(|ring| ring.rim.hoop),
            shaft_surface_hoop_mpa: shaft(|ring| ring.rim.hoop),
            shaft_bore_hoop_mpa: shaft(|ring| ring.bore.hoop),
            shaft_von_mises_mpa: shaft(|ring| ring.bore.von_mises.max(ring.rim.von_mises)),
            torque_capacity_nm: finite(pair.torque_capacity),
            axial_capacity_n: finite(pair.axial_capacity),
            press_force_n: finite(pair.press_force.high),
            press_force_low_n: finite(pair.press_force.low),
            release_force_n: finite(pair.release_force.high),
            release_force_low_n: finite(pair.release_force.low),
            interfaces: pair.interfaces.iter().map(Interface::of).collect(),
            rings: rings(joint, &pair.rings),
            slices: pair.slices.iter().map(|slice| Slice::of(joint, slice)).collect(),
        }
    }
}

impl Interface {
    pub(super) fn of(found: &InterfaceFindings) -> Self {
        Self {
            diameter_mm: millimetres(found.diameter),
            interference_um: microns(found.interference),
            effective_interference_um: microns(found.effective_interference),
            pressure_mpa: mega(found.pressure),
            gap_um: microns(found.gap),
            open: found.open,
            torque_capacity_nm: finite(found.torque_capacity),
            axial_capacity_n: finite(found.axial_capacity),
        }
    }
}

impl Slice {
    fn of(joint: &Joint, slice: &SliceFindings) -> Self {
        Self {
            length_mm: millimetres(slice.length),
            hub_outer_diameter_mm: millimetres(slice.hub_outer_diameter),
            shaft_bore_mm: millimetres(slice.shaft_bore),
            pressure_mpa: mega(slice.pressure),
            rings: rings(joint, &slice.rings),
        }
    }
}

/// The rings from the innermost outwards, with their names.
pub(super) fn rings(joint: &Joint, stresses: &[RingStress]) -> Vec<Ring> {
    joint.rings.iter().zip(stresses).map(|(ring, stress)| Ring::of(&ring.name, stress)).collect()
}

impl Ring {
    fn of(name: &str, stress: &RingStress) -> Self {
        Self {
            name: name.to_owned(),
            bore_hoop_mpa: mega(stress.bore.hoop),
            bore_radial_mpa: mega(stress.bore.radial),
            bore_von_mises_mpa: mega(stress.bore.von_mises),
            rim_hoop_mpa: mega(stress.rim.hoop),
            rim_radial_mpa: mega(stress.rim.radial),
            rim_von_mises_mpa: mega(stress.rim.von_mises),
            equivalent_mpa: mega(stress.equivalent),
            strength_mpa: stress.strength.and_then(mega),
            yield_safety: stress.safety.and_then(finite),
            bore_change_um: finite(stress.bore_change * 1e6),
            outer_change_um: finite(stress.outer_change * 1e6),
        }
    }
}
