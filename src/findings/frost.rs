//! Frost on a chilled shaft while it is handled: a bound on its thickness and its heat, and what both leave of the time.

use crate::assembly::AssemblyError;
use crate::assembly::frost::{Deposit, greatest_deposit, vapour_density, vapour_over_water};
use crate::assembly::handling::{Handling, HandlingCourse};
use crate::material::Range;

/// Frost on a seat that stands in the open all the time: more than the real one, which the hub soon covers.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct FrostFindings {
    /// Relative humidity of the room, 0 to 1.
    pub humidity: f64,
    /// Density of the vapour in the room, kg/m³.
    pub vapour: f64,
    /// The fastest deposit while the shaft warms.
    pub deposit: Deposit,
    /// Faces that it settles on: seat, bore and both ends over the length of the hub, m².
    pub area: f64,
    /// Heat that it brings, W.
    pub heat: f64,
    /// That heat over what the air brings by convection.
    pub share: f64,
    /// At the end of the time that the tightest pair allows; none when there is no such time.
    pub at_end: Option<FrostAtEnd>,
}

/// Frost at the end of the time that the tightest pair allows without it.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct FrostAtEnd {
    /// That time, s.
    pub time: f64,
    /// Thickness on the seat, m, from the densest to the lightest frost.
    pub thickness: Range,
    /// Rise of the shaft by the heat of the frost, K.
    pub warming: f64,
    /// Diametral clearance that this rise takes, m.
    pub by_heat: f64,
    /// Time until no clearance is left with the lightest frost and its heat counted, s.
    pub gone: f64,
}

/// The frost of a handled pair; none when nothing settles.
pub(super) fn frost(
    pair: &Handling,
    tightest: &HandlingCourse,
    least: f64,
    humidity: f64,
) -> Result<Option<FrostFindings>, AssemblyError> {
    let (air, shaft) = (pair.air_temperature, &pair.shaft);
    if shaft.temperature >= air {
        return Ok(None);
    }
    let vapour = vapour_density(humidity * vapour_over_water(air)?, air)?;
    let end = tightest.points.last().map_or(shaft.temperature, |point| point.shaft_temperature);
    let deposit =
        greatest_deposit(shaft.outer_diameter, (shaft.temperature, end.min(air - 1.0)), air, vapour)?;
    if deposit.rate <= 0.0 {
        return Ok(None);
    }
    let section = std::f64::consts::FRAC_PI_4 * (shaft.outer_diameter.powi(2) - shaft.inner_diameter.powi(2));
    let around = std::f64::consts::PI * (shaft.outer_diameter + shaft.inner_diameter) * pair.length;
    let area = around + 2.0 * section;
    let heat = deposit.heat_flux() * area;
    let at_end = match tightest.gone.filter(|gone| *gone > 0.0) {
        None => None,
        Some(time) => {
            let capacity = section
                * pair.length
                * shaft.substance.density
                * shaft.substance.specific_heat.value_held(shaft.temperature);
            let warming = heat * time / capacity;
            let (_, warmest) = shaft.expansion.range();
            let strain = |temperature: f64| shaft.expansion.strain(temperature.min(warmest));
            let by_heat = shaft.outer_diameter * (strain(end + warming)? - strain(end)?);
            let growth = deposit.growth();
            Some(FrostAtEnd {
                time,
                thickness: Range { low: growth.low * time, high: growth.high * time },
                warming,
                by_heat,
                gone: gone(tightest, least, 2.0 * growth.high + by_heat / time, time),
            })
        }
    };
    let share = deposit.heat_flux() / (deposit.film * (air - deposit.surface));
    Ok(Some(FrostFindings { humidity, vapour, deposit, area, heat, share, at_end }))
}

/// When the clearance of a course is gone if `rate` (m/s) of it is taken besides; linear between its points.
fn gone(course: &HandlingCourse, least: f64, rate: f64, latest: f64) -> f64 {
    let left = course.points.iter().map(|point| (point.time, point.clearance - least - rate * point.time));
    let mut before: Option<(f64, f64)> = None;
    for (time, left) in left {
        if left <= 0.0 {
            return match before {
                Some((earlier, more)) => (earlier + (time - earlier) * more / (more - left)).min(latest),
                None => 0.0,
            };
        }
        before = Some((time, left));
    }
    latest
}
