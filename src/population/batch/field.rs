//! The keys whose cells are put straight into a joint that was read before.

use crate::joint::{DutyState, Joint, SMALLEST};
use crate::quantity::Kind;
use crate::tolerance::Member;

/// A key that is put in straight.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Field {
    Diameter,
    Length,
    Relief,
    Bore,
    OuterDiameter,
    ShaftRoughness,
    HubRoughness,
    Fit,
    Limit(Member, End),
    MeasuredHole,
    MeasuredShaft,
    MeasuredUncertainty,
    Holding,
    Pressing,
    Release,
    SlipSafety,
    YieldSafety,
    FractureSafety,
    PressForce,
    Clearance,
    Torque(usize),
    AxialForce(usize),
    Speed(usize),
    BendingMoment(usize),
    RadialForce(usize),
    OuterPressure(usize),
    Temperature(usize),
    ShaftTemperature(usize),
    HubTemperature(usize),
}

/// Which limit of a member, and how it is written.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum End {
    /// Lower deviation.
    Lower,
    /// Upper deviation.
    Upper,
    /// Minimum limit of size.
    Minimum,
    /// Maximum limit of size.
    Maximum,
}

impl Field {
    /// The field of a key in joints with these states; none when only the reader of joint files puts it in.
    pub(super) fn of(key: &str, duty: &[DutyState]) -> Option<Self> {
        if let Some(field) = Self::plain(key) {
            return Some(field);
        }
        let (state, name) = split_state(key)?;
        let number = match state.parse::<usize>() {
            Ok(number) => number,
            Err(_) => duty.iter().position(|known| known.name == state)?,
        };
        duty.get(number)?;
        Self::of_state(name, number)
    }

    /// Whether a key has a field, in joints that have its state.
    pub(super) fn has(key: &str) -> bool {
        Self::plain(key).is_some()
            || split_state(key).is_some_and(|(_, name)| Self::of_state(name, 0).is_some())
    }

    fn plain(key: &str) -> Option<Self> {
        Some(match key {
            "diameter" => Self::Diameter,
            "length" => Self::Length,
            "relief" => Self::Relief,
            "shaft.bore" => Self::Bore,
            "hub.outer_diameter" => Self::OuterDiameter,
            "shaft.roughness" => Self::ShaftRoughness,
            "hub.roughness" => Self::HubRoughness,
            "fit" => Self::Fit,
            "fit.hole.lower" => Self::Limit(Member::Hole, End::Lower),
            "fit.hole.upper" => Self::Limit(Member::Hole, End::Upper),
            "fit.hole.min" => Self::Limit(Member::Hole, End::Minimum),
            "fit.hole.max" => Self::Limit(Member::Hole, End::Maximum),
            "fit.shaft.lower" => Self::Limit(Member::Shaft, End::Lower),
            "fit.shaft.upper" => Self::Limit(Member::Shaft, End::Upper),
            "fit.shaft.min" => Self::Limit(Member::Shaft, End::Minimum),
            "fit.shaft.max" => Self::Limit(Member::Shaft, End::Maximum),
            "fit.measured.hole" => Self::MeasuredHole,
            "fit.measured.shaft" => Self::MeasuredShaft,
            "fit.measured.uncertainty" => Self::MeasuredUncertainty,
            "friction.holding" => Self::Holding,
            "friction.pressing" => Self::Pressing,
            "friction.release" => Self::Release,
            "require.slip_safety" => Self::SlipSafety,
            "require.yield_safety" => Self::YieldSafety,
            "require.fracture_safety" => Self::FractureSafety,
            "require.press_force" => Self::PressForce,
            "assembly.clearance" => Self::Clearance,
            _ => return None,
        })
    }

    fn of_state(name: &str, number: usize) -> Option<Self> {
        Some(match name {
            "torque" => Self::Torque(number),
            "axial_force" => Self::AxialForce(number),
            "speed" => Self::Speed(number),
            "bending_moment" => Self::BendingMoment(number),
            "radial_force" => Self::RadialForce(number),
            "outer_pressure" => Self::OuterPressure(number),
            "temperature" => Self::Temperature(number),
            "shaft_temperature" => Self::ShaftTemperature(number),
            "hub_temperature" => Self::HubTemperature(number),
            _ => return None,
        })
    }

    /// What its cells measure; none when they are no single quantity.
    pub(super) fn kind(self) -> Option<Kind> {
        Some(match self {
            Self::Fit | Self::ShaftRoughness | Self::HubRoughness => return None,
            Self::Holding | Self::Pressing | Self::Release => return None,
            Self::SlipSafety | Self::YieldSafety | Self::FractureSafety => Kind::Number,
            Self::PressForce | Self::AxialForce(_) | Self::RadialForce(_) => Kind::Force,
            Self::Torque(_) | Self::BendingMoment(_) => Kind::Torque,
            Self::Speed(_) => Kind::Speed,
            Self::OuterPressure(_) => Kind::Pressure,
            Self::Temperature(_) | Self::ShaftTemperature(_) | Self::HubTemperature(_) => Kind::Temperature,
            _ => Kind::Length,
        })
    }

    /// Whether it moves the nominal diameter, on which a fit depends.
    pub(super) fn moves_diameter(self) -> bool {
        self == Self::Diameter
    }

    /// Whether it belongs to two measured parts.
    pub(super) fn is_measured(self) -> bool {
        matches!(self, Self::MeasuredHole | Self::MeasuredShaft | Self::MeasuredUncertainty)
    }
}

/// State and key of `duty.rated.torque`.
fn split_state(key: &str) -> Option<(&str, &str)> {
    key.strip_prefix("duty.")?.rsplit_once('.')
}

/// Puts a quantity into a joint; none when the reader of joint files would refuse it, or may.
///
/// What depends on several keys is looked after when all are in.
pub(super) fn put(joint: &mut Joint, field: Field, value: f64) -> Option<()> {
    let positive = (value > 0.0).then_some(value);
    let not_negative = (value >= 0.0).then_some(value);
    let length = (value >= SMALLEST).then_some(value);
    let length_or_zero = (value == 0.0 || value >= SMALLEST).then_some(value);
    let state = |joint: &mut Joint, number: usize, put: &dyn Fn(&mut DutyState, f64)| {
        let value = not_negative?;
        put(joint.duty.get_mut(number)?, value);
        Some(())
    };
    match field {
        Field::Diameter => joint.diameter = length?,
        Field::Length => joint.length = length?,
        Field::Relief => joint.relief = length_or_zero?,
        Field::Bore => joint.rings.first_mut()?.inner_diameter = length_or_zero?,
        Field::OuterDiameter => joint.rings.get_mut(1)?.outer_diameter = length?,
        Field::SlipSafety => joint.require.slip_safety = positive?,
        Field::YieldSafety => joint.require.yield_safety = positive?,
        Field::FractureSafety => joint.require.fracture_safety = positive?,
        Field::PressForce => joint.require.press_force = Some(positive?),
        Field::Clearance => joint.assembly.clearance.value = not_negative?,
        Field::Torque(number) => state(joint, number, &|state, value| state.torque = value)?,
        Field::AxialForce(number) => state(joint, number, &|state, value| state.axial_force = value)?,
        Field::Speed(number) => state(joint, number, &|state, value| state.speed = value)?,
        Field::BendingMoment(number) => state(joint, number, &|state, value| state.bending_moment = value)?,
        Field::RadialForce(number) => state(joint, number, &|state, value| state.radial_force = value)?,
        Field::OuterPressure(number) => state(joint, number, &|state, value| state.outer_pressure = value)?,
        Field::Temperature(number) => {
            temperature(joint, number, 0, value)?;
            temperature(joint, number, 1, value)?;
        }
        Field::ShaftTemperature(number) => temperature(joint, number, 0, value)?,
        Field::HubTemperature(number) => temperature(joint, number, 1, value)?,
        _ => return None,
    }
    Some(())
}

/// Puts the temperature (K) of a part into a state, within its expansion curve.
fn temperature(joint: &mut Joint, state: usize, part: usize, value: f64) -> Option<()> {
    let (low, high) = joint.rings.get(part)?.material.expansion.range();
    let inside = value == crate::material::REFERENCE_TEMPERATURE || (low..=high).contains(&value);
    let own = joint.duty.get_mut(state)?.temperatures.get_mut(part)?;
    *own = inside.then_some(value)?;
    Some(())
}
