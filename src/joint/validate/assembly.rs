//! How the joint is put together.

use super::practice;
use crate::joint::assembly_keys::AssemblyKeys;
use crate::joint::draft::Draft;
use crate::joint::file::JointFile;
use crate::joint::written::Written;
use crate::joint::{AssemblyPlan, Bath, Method, Ring};
use crate::material::{REFERENCE_TEMPERATURE, Sourced};
use crate::quantity::{Angle, Kind, Temperature, written};

/// Clearance while joining, as a share of the diameter, when the file is silent.
const CLEARANCE_SHARE: f64 = 1e-3;
const CLEARANCE_SOURCE: &str =
    "a thousandth of the diameter, after DIN 7190 (course sheet on interference fits, second-hand)";

/// Angle of the lead-in chamfer, degrees, when the file is silent.
const CHAMFER_DEGREES: f64 = 5.0;
const CHAMFER_SOURCE: &str = "lead-in chamfer of pressed fits: at most 5 degrees (textbooks after DIN 7190)";

fn keys(file: &JointFile) -> Option<&AssemblyKeys> {
    file.assembly.as_ref().map(|at| &at.value)
}

/// The method of assembly.
pub(super) fn method(draft: &mut Draft<'_>, file: &JointFile) -> Option<Method> {
    match keys(file).and_then(|keys| keys.method.as_ref()) {
        Some(given) => draft.value(given),
        None => {
            draft.default(
                "assembly.method",
                "press",
                "the plainest method; the other routes are computed as well",
            );
            Some(Method::Press)
        }
    }
}

/// Temperature of the shop, K.
pub(super) fn shop_temperature(draft: &mut Draft<'_>, file: &JointFile) -> Option<f64> {
    match keys(file).and_then(|keys| keys.shop_temperature.as_ref()) {
        Some(given) => draft.value(given),
        None => {
            draft.default(
                "assembly.shop_temperature",
                "20 degC",
                "ISO 1:2022, clause 4: reference temperature of sizes",
            );
            Some(REFERENCE_TEMPERATURE)
        }
    }
}

/// The plan of assembly.
pub(super) fn plan(
    draft: &mut Draft<'_>,
    file: &JointFile,
    rings: Option<&[Ring]>,
    diameter: Option<f64>,
    method: Option<Method>,
    shop: Option<f64>,
) -> Option<AssemblyPlan> {
    let keys = keys(file);
    if let Some(given) = keys.and_then(|keys| keys.shop_temperature.as_ref()) {
        within_curves(draft, given, shop, rings.unwrap_or_default());
    }
    let clearance = clearance(draft, keys, diameter);
    let chamfer_angle = chamfer_angle(draft, keys.and_then(|keys| keys.chamfer_angle.as_ref()));
    let bath = match keys.and_then(|keys| keys.bath.as_ref()) {
        Some(given) => draft.value(given),
        None => {
            draft.default("assembly.bath", "dry ice", "the milder bath; liquid nitrogen is computed as well");
            Some(Bath::DryIce)
        }
    };
    let limits = [
        keys.and_then(|keys| keys.hub_temperature_limit.as_ref()),
        file.require.as_ref().and_then(|at| at.value.hub_temperature.as_ref()),
    ];
    let mut hub_temperature_limit: Option<f64> = None;
    for given in limits.into_iter().flatten() {
        let limit = hub_limit(draft, given, shop)?;
        hub_temperature_limit = Some(hub_temperature_limit.map_or(limit, |lower| lower.min(limit)));
    }
    let practice = practice::practice(draft, keys, method, shop, rings.unwrap_or_default());
    remark_on_idle_limits(draft, file, method);
    Some(AssemblyPlan {
        method: method?,
        shop_temperature: shop?,
        clearance: clearance?,
        chamfer_angle: chamfer_angle?,
        bath: bath?,
        hub_temperature_limit,
        practice: practice?,
    })
}

/// A fault when a temperature is outside the expansion curve of one of the rings, or that of its modulus.
pub(super) fn within_curves(
    draft: &Draft<'_>,
    given: &Written<Temperature>,
    temperature: Option<f64>,
    rings: &[Ring],
) -> bool {
    let Some(temperature) = temperature else { return false };
    let outside = |(low, high): (f64, f64)| {
        temperature != REFERENCE_TEMPERATURE && !(low..=high).contains(&temperature)
    };
    let beyond = rings.iter().find_map(|ring| {
        let expansion = ("expansion curve", ring.material.expansion.range());
        let modulus = ring.material.youngs_modulus_curve.as_ref();
        let modulus = modulus.map(|curve| ("curve of Young's modulus", curve.range()));
        let found = std::iter::once(expansion).chain(modulus).find(|(_, range)| outside(*range));
        found.map(|(what, range)| (ring, what, range))
    });
    let Some((ring, what, (low, high))) = beyond else { return true };
    let text = |kelvin| written(Kind::Temperature, kelvin);
    draft.refuse(
        given,
        &format!(
            "is outside the {what} of {} ({}), which runs from {} to {}",
            ring.material.id,
            ring.name,
            text(low),
            text(high)
        ),
    );
    false
}

fn clearance(
    draft: &mut Draft<'_>,
    keys: Option<&AssemblyKeys>,
    diameter: Option<f64>,
) -> Option<Sourced<f64>> {
    match keys.and_then(|keys| keys.clearance.as_ref()) {
        Some(given) => Some(Sourced::new(draft.not_negative(given)?, "joint file")),
        None => {
            let clearance = CLEARANCE_SHARE * diameter?;
            draft.default("assembly.clearance", written(Kind::Length, clearance), CLEARANCE_SOURCE);
            Some(Sourced::new(clearance, CLEARANCE_SOURCE))
        }
    }
}

fn chamfer_angle(draft: &mut Draft<'_>, given: Option<&Written<Angle>>) -> Option<Sourced<f64>> {
    let Some(given) = given else {
        draft.default("assembly.chamfer_angle", "5 deg", CHAMFER_SOURCE);
        return Some(Sourced::new(CHAMFER_DEGREES.to_radians(), CHAMFER_SOURCE));
    };
    let angle = draft.value(given)?;
    if angle > 0.0 && angle < std::f64::consts::FRAC_PI_2 {
        return Some(Sourced::new(angle, "joint file"));
    }
    draft.refuse(given, "must be more than 0 deg and less than 90 deg, counted from the axis");
    None
}

/// A limit of the other way to join is not judged, and that must not pass unseen.
fn remark_on_idle_limits(draft: &mut Draft<'_>, file: &JointFile, method: Option<Method>) {
    let Some(require) = file.require.as_ref().map(|at| &at.value) else { return };
    let heats = matches!(method, Some(Method::HeatHub | Method::HeatAndChill));
    if require.hub_temperature.is_some() && !heats {
        draft.remarks.push(
            "The limit require.hub_temperature is not judged: the method of assembly does not heat the hub."
                .into(),
        );
    }
    if require.press_force.is_some() && method.is_some_and(|method| method != Method::Press) {
        draft
            .remarks
            .push("The limit require.press_force is not judged: the method of assembly is not press.".into());
    }
}

fn hub_limit(draft: &Draft<'_>, given: &Written<Temperature>, shop: Option<f64>) -> Option<f64> {
    let limit = draft.value(given)?;
    if limit > shop? {
        return Some(limit);
    }
    draft.refuse(given, "is not above the shop temperature");
    None
}
