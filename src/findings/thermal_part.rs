//! A ring as the heat sees it: its body and its thermal properties over the temperatures it goes through.

use crate::assembly::AssemblyError;
use crate::assembly::conduction::{Body, Substance};
use crate::assembly::cryogen::debye_specific_heat;
use crate::assembly::property::Property;
use crate::joint::{Joint, Ring};
use crate::material::{Family, Material};

/// Below this temperature a metal's specific heat is taken from Debye's function, K.
const COLD: f64 = 273.15;

/// The two parts that are joined last as the heat sees them, the inner one first: whole, with the rings that each of them has
/// been joined with before. Their material is that of the ring at the seat.
///
/// A stepped part has the section with the `slow` pace of all its slices, that which soaks longest, or the quick one, which
/// is the first to lose its warmth or cold.
pub(super) fn joined_parts(joint: &Joint, pace: Pace) -> (Ring, Ring) {
    let (shaft, hub) = joint.joined_last();
    let (innermost, outermost) = joint.shaft_and_hub();
    let (mut bore, mut rim) = (innermost.inner_diameter, outermost.outer_diameter);
    let pick =
        |slow: fn(f64, f64) -> f64, quick: fn(f64, f64) -> f64| if pace == Pace::Slow { slow } else { quick };
    let bores = joint.slices.iter().map(|slice| slice.shaft_bore);
    bore = bores.reduce(pick(f64::min, f64::max)).unwrap_or(bore);
    let rims = joint.slices.iter().map(|slice| slice.hub_outer_diameter);
    rim = rims.reduce(pick(f64::max, f64::min)).unwrap_or(rim);
    (Ring { inner_diameter: bore, ..shaft.clone() }, Ring { outer_diameter: rim, ..hub.clone() })
}

/// Which slice of a stepped part is meant.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Pace {
    /// The one that takes longest to soak.
    Slow,
    /// The one whose temperature changes first.
    Quick,
}

/// The ring over `length` (m).
pub(super) fn body(ring: &Ring, length: f64) -> Body {
    Body { inner_diameter: ring.inner_diameter, outer_diameter: ring.outer_diameter, length }
}

/// Thermal properties of a material from `coldest` to `hottest` (K); none when its record does not have them.
///
/// Conductivity and, above 20 °C, specific heat are those at room temperature; below, the specific heat of a metal
/// follows Debye's function.
pub(super) fn substance(
    material: &Material,
    coldest: f64,
    hottest: f64,
) -> Result<Option<Substance>, AssemblyError> {
    let (Some(conductivity), Some(specific_heat)) = (&material.conductivity, &material.specific_heat) else {
        return Ok(None);
    };
    let specific_heat = match debye_temperature(material.family) {
        Some(debye) if coldest < COLD => cold_specific_heat(specific_heat.value, debye, coldest, hottest)?,
        _ => Property::constant(specific_heat.value)?,
    };
    Ok(Some(Substance {
        conductivity: Property::constant(conductivity.value)?,
        density: material.density.value,
        specific_heat,
    }))
}

/// Debye's curve up to 20 °C, then the value at room temperature.
fn cold_specific_heat(room: f64, debye: f64, coldest: f64, hottest: f64) -> Result<Property, AssemblyError> {
    const POINTS: u32 = 13;
    let curve = debye_specific_heat(room, debye, coldest - 1.0)?;
    let end = crate::material::REFERENCE_TEMPERATURE;
    let from = coldest - 1.0;
    let mut points = (0..POINTS - 1)
        .map(|i| from + (end - from) * f64::from(i) / f64::from(POINTS - 1))
        .map(|temperature| Ok((temperature, curve.value(temperature)?)))
        .collect::<Result<Vec<_>, AssemblyError>>()?;
    points.push((end, room));
    points.push((end.max(hottest) + 1.0, room));
    Property::curve(&points)
}

/// Debye temperature of the main metal, K (C. Kittel, *Introduction to Solid State Physics*, chapter 5, table 1).
fn debye_temperature(family: Family) -> Option<f64> {
    Some(match family {
        Family::Steel
        | Family::CastSteel
        | Family::StainlessSteel
        | Family::GreyIron
        | Family::SpheroidalIron
        | Family::MalleableIron => 470.0,
        Family::Aluminium => 428.0,
        Family::Magnesium => 400.0,
        Family::Bronze | Family::Brass | Family::Copper => 343.0,
        Family::Titanium => 420.0,
        Family::Nickel => 450.0,
        Family::Zinc => 327.0,
        Family::CementedCarbide | Family::Polymer | Family::Other => return None,
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::material::library::Library;

    #[test]
    fn cold_metal_stores_less_heat_and_hot_metal_the_room_value() {
        let steel = Library::built_in().find("C45+N").unwrap();
        let room = steel.specific_heat.as_ref().unwrap().value;
        let cold = substance(&steel, 77.36, 400.0).unwrap().unwrap().specific_heat;
        // Debye's function with 470 K, integrated apart from this program by the midpoint rule with 20 000 steps:
        // 0.2590376 of 3R at 77.36 K and 0.8824027 at 293.15 K. The curve through points costs less than 0.1 %.
        let share = cold.value(77.36).unwrap() / room;
        assert!((share / (0.259_037_6 / 0.882_402_7) - 1.0).abs() < 0.001, "{share}");
        assert!((cold.value(350.0).unwrap() / room - 1.0).abs() < 1e-9);
        let warm = substance(&steel, 288.15, 500.0).unwrap().unwrap().specific_heat;
        assert_eq!(warm, Property::Constant(room));
    }
}
