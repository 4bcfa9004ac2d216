//! Around the press and after it: its size, what the work turns into, what gives way, and how the joint comes apart.

use super::{AssemblyFindings, PairFindings};
use crate::assembly::joining::Joining;
use crate::assembly::press::advised_chamfer_length;
use crate::assembly::press_practice::{
    EndHold, Pin, PressHeating, PressSize, PressWork, PushOut, buckling_force, face_stress, press_heating,
    press_size, push_out,
};
use crate::assembly::release::release_temperature;
use crate::assembly::{AssemblyError, press_practice::Buckling};
use crate::joint::{Joint, Ring};
use crate::tolerance::Extremes;

/// Usual speed of pressing, m/s: 2 mm/s (DIN 7190, from memory).
pub const PRESS_SPEED: f64 = 0.002;

/// Around the press, and after it; all at the tightest pair with the high friction.
#[derive(Debug, Clone, PartialEq)]
pub struct PressWorkFindings {
    /// Press to look for.
    pub size: PressSize,
    /// Warming of the seat at the usual speed; none without thermal properties.
    pub heating: Option<PressHeating>,
    /// End face of the shaft under the ram.
    pub shaft_face: FaceFindings,
    /// End face of the hub on the table.
    pub hub_face: FaceFindings,
    /// Buckling of the shaft as a pin as long as the hub; none without a strength.
    pub buckling: Option<Buckling>,
    /// Forces to push the joint apart after it has rested.
    pub push_out: PushOut,
    /// Hub temperature at which the joint lets go when the shaft lags behind; K.
    pub release: Result<f64, String>,
}

impl PressWorkFindings {
    /// The buckling force of a shaft that is slender: free over three diameters or more (common practice, no source).
    pub fn slender(&self) -> Option<&Buckling> {
        const SLENDER: f64 = 12.0;
        self.buckling.as_ref().filter(|buckling| buckling.slenderness >= SLENDER)
    }
}

/// A face that takes the press force.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct FaceFindings {
    /// Mean compressive stress, Pa.
    pub stress: f64,
    /// Strength over stress; none when no strength is known.
    pub safety: Option<f64>,
}

/// Around the press; none when even the tightest pair does not grip.
pub(super) fn press_work(
    joint: &Joint,
    extremes: &Extremes<PairFindings>,
    assembly: &AssemblyFindings,
    joining: &Joining<'_>,
) -> Result<Option<PressWorkFindings>, AssemblyError> {
    let curve = &assembly.press.tightest;
    let pressure = extremes.tightest.pressure;
    if curve.peak_force <= 0.0 || pressure <= 0.0 {
        return Ok(None);
    }
    let (shaft, hub) = joint.joined_last();
    let diameter = joint.interface_diameter(joint.last_interface());
    let length = joint.engaged_length();
    let chamfer = advised_chamfer_length(diameter)? * joint.assembly.chamfer_angle.value.tan();
    let friction = &joint.friction;
    Ok(Some(PressWorkFindings {
        size: press_size(curve.peak_force),
        heating: heating(joint, pressure, curve.work)?,
        shaft_face: face(curve.peak_force, shaft, diameter - 2.0 * chamfer, shaft.inner_diameter)?,
        hub_face: face(curve.peak_force, hub, hub.outer_diameter, diameter + 2.0 * chamfer)?,
        buckling: buckling(shaft, diameter, joint.length)?,
        push_out: push_out(pressure, diameter, length, friction.release.value, friction.pressing.value)?,
        release: release(joint, joining),
    }))
}

fn release(joint: &Joint, joining: &Joining<'_>) -> Result<f64, String> {
    let free = Joining { clearance: 0.0, ..*joining };
    let share = 1.0 - joint.assembly.practice.temperature_lag;
    release_temperature(&free, share).map_err(|error| match error {
        AssemblyError::CurveEnds { .. } => {
            "the expansion data end before the hub lets go of a shaft that lags no further behind".to_owned()
        }
        other => other.to_string(),
    })
}

fn strength(ring: &Ring) -> Option<f64> {
    ring.strength.yield_strength.or(ring.strength.tensile_strength)
}

fn face(force: f64, ring: &Ring, outer: f64, inner: f64) -> Result<FaceFindings, AssemblyError> {
    // A wall thinner than its chamfer takes the force over its whole face.
    let (outer, inner) =
        if outer > inner { (outer, inner) } else { (ring.outer_diameter, ring.inner_diameter) };
    let stress = face_stress(force, outer, inner)?;
    Ok(FaceFindings { stress, safety: strength(ring).map(|strength| strength / stress) })
}

fn buckling(shaft: &Ring, diameter: f64, length: f64) -> Result<Option<Buckling>, AssemblyError> {
    let Some(yield_strength) = strength(shaft) else { return Ok(None) };
    let pin = Pin {
        outer_diameter: diameter,
        inner_diameter: shaft.inner_diameter,
        free_length: length,
        youngs_modulus: shaft.material.youngs_modulus.value,
        yield_strength,
        ends: EndHold::FixedFree,
    };
    buckling_force(&pin).map(Some)
}

/// With the worse of both parts: the one that takes up heat least readily.
fn heating(joint: &Joint, pressure: f64, work: f64) -> Result<Option<PressHeating>, AssemblyError> {
    let (shaft, hub) = joint.joined_last();
    let effusivity = |ring: &Ring| {
        let material = &ring.material;
        let (conductivity, heat) = (material.conductivity.as_ref()?, material.specific_heat.as_ref()?);
        Some((conductivity.value, material.density.value, heat.value))
    };
    let (Some(one), Some(other)) = (effusivity(shaft), effusivity(hub)) else { return Ok(None) };
    let product = |(conductivity, density, heat): (f64, f64, f64)| conductivity * density * heat;
    let (conductivity, density, specific_heat) = if product(one) < product(other) { one } else { other };
    let length = joint.engaged_length();
    let mass = |ring: &Ring| super::thermal_part::body(ring, length).volume() * ring.material.density.value;
    press_heating(&PressWork {
        work,
        mass: mass(shaft) + mass(hub),
        pressure,
        friction: joint.friction.pressing.value.high,
        length,
        speed: PRESS_SPEED,
        conductivity,
        density,
        specific_heat,
    })
    .map(Some)
}
