//! How much liquid nitrogen or dry ice the chilling takes, and what its gas does to the air of the room.

use super::thermal_part::{Pace, body, joined_parts, substance};
use super::times::SoakFindings;
use crate::assembly::AssemblyError;
use crate::assembly::atmosphere::{
    OXYGEN_IN_AIR, OXYGEN_WARNING, OxygenLevel, carbon_dioxide_share, oxygen_after_displacement,
    oxygen_level, oxygen_ventilated,
};
use crate::assembly::bath_liquid::{ACETONE, ALCOHOL, BathLiquid};
use crate::assembly::cryogen::{
    Amount, ColdJob, Coolant, DRY_ICE, JobAmounts, LIQUID_NITROGEN, PRACTICAL_FACTOR,
};
use crate::joint::practice::{Room, Vessel};
use crate::joint::{Bath, Joint};

/// Volume of the bath over that of the box round the part when no vessel is given (common practice, no source).
const USUAL_BATH: f64 = 2.0;
/// Share of an open bath that is lost in an hour when nothing better is known (common practice, no source).
const USUAL_HOURLY_LOSS: f64 = 0.05;

/// What a cold bath takes and gives off.
#[derive(Debug, Clone, PartialEq)]
pub struct ColdBathFindings {
    /// The bath.
    pub bath: Bath,
    /// Mass of the part that is chilled, kg.
    pub part_mass: f64,
    /// Mean specific heat of the part from shop to bath temperature, J/(kg·K).
    pub mean_specific_heat: f64,
    /// The whole job in its vessel.
    pub job: JobAmounts,
    /// The liquid that dry ice keeps cold; none of a bath without one.
    pub liquid: Option<LiquidFindings>,
    /// What cools the part when the cold gas is used as well: the least.
    pub with_cold_gas: Amount,
    /// What to have at hand for the part and the vessel, from low to high: the boiled-off mass times the practical
    /// factor, and the filling, kg.
    pub to_bring: (f64, f64),
    /// Volume of the bath up to the level that covers the part, m³.
    pub vessel: f64,
    /// Lost in an hour at rest.
    pub hourly_loss: Amount,
    /// Time in the bath, s.
    pub time: f64,
    /// Least volume of an unventilated room in which oxygen stays at or above the warning level, m³.
    pub least_room: f64,
    /// The room; none when the joint file does not give one.
    pub room: Option<RoomFindings>,
}

/// The liquid of a bath of dry ice.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct LiquidFindings {
    /// What it is.
    pub liquid: BathLiquid,
    /// How much goes round the part, m³.
    pub volume: f64,
    /// Its mass, kg.
    pub mass: f64,
    /// Dry ice that brings it down to the temperature of the bath.
    pub ice: Amount,
}

/// The air of the room.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct RoomFindings {
    /// The room.
    pub room: Room,
    /// Share of oxygen when the gas boiled off pushes out its own volume of air: the one to warn by.
    pub oxygen: f64,
    /// Share of oxygen in the mixed, ventilated room at the end of the chilling.
    pub oxygen_ventilated: f64,
    /// Share of oxygen when all that was brought is spilled.
    pub oxygen_spilled: f64,
    /// How the first of these is judged.
    pub level: OxygenLevel,
    /// How the spill is judged.
    pub level_spilled: OxygenLevel,
    /// Share of carbon dioxide from dry ice in the mixed, closed room.
    pub carbon_dioxide: Option<f64>,
}

/// The cold bath of a joint whose shaft is chilled; or a full sentence that says why it does not exist.
pub(super) fn cold_bath(
    joint: &Joint,
    soak: &SoakFindings,
) -> Result<Result<ColdBathFindings, String>, AssemblyError> {
    let (shaft, _) = joined_parts(joint, Pace::Slow);
    let shop = joint.assembly.shop_temperature;
    let coolant = coolant(joint.assembly.bath);
    let practice = &joint.assembly.practice;
    let length = practice.chilled_length.unwrap_or(joint.length);
    let part = body(&shaft, length);
    let Some(substance) = substance(&shaft.material, coolant.temperature, shop)? else {
        return Ok(
            Err("The amount of coolant does not exist: the material has no specific heat.".to_owned()),
        );
    };
    let around = std::f64::consts::FRAC_PI_4 * shaft.outer_diameter.powi(2) * length;
    let vessel = practice.vessel.unwrap_or(Vessel { volume: USUAL_BATH * around, hourly_loss: None });
    if vessel.volume <= part.volume() {
        return Ok(Err(format!(
            "The amount of coolant does not exist: the {} does not go into the vessel.",
            shaft.name
        )));
    }
    let hourly_loss = vessel.hourly_loss.unwrap_or(USUAL_HOURLY_LOSS * vessel.volume) * coolant.density;
    let time = soak.marks[2];
    let job = coolant.job(&ColdJob {
        part_volume: part.volume(),
        substance: substance.clone(),
        from: shop,
        space: vessel.volume,
        vessel: None,
        idle_rate: hourly_loss / 3600.0,
        time,
    })?;
    let liquid = liquid_of(joint.assembly.bath)
        .map(|liquid| {
            let volume = vessel.volume - part.volume();
            let (mass, ice) = liquid.cooled(volume, shop)?;
            Ok::<_, AssemblyError>(LiquidFindings { liquid, volume, mass, ice })
        })
        .transpose()?;
    let job = match &liquid {
        None => job,
        // The liquid covers the part; of the ice nothing need stay over.
        Some(found) => {
            let boiled = coolant.amount(job.boiled.mass + found.ice.mass);
            JobAmounts { cover: coolant.amount(0.0), boiled, total: boiled, ..job }
        }
    };
    let part_mass = part.volume() * substance.density;
    let gas = job.boiled.gas_volume;
    let is_dry_ice = joint.assembly.bath.is_dry_ice();
    let room = practice.room.map(|room| room_findings(room, &job, is_dry_ice, time)).transpose()?;
    let to_bring = |factor: f64| factor * job.boiled.mass + job.cover.mass;
    Ok(Ok(ColdBathFindings {
        bath: joint.assembly.bath,
        part_mass,
        mean_specific_heat: soak.heat / (part_mass * (shop - coolant.temperature)),
        with_cold_gas: coolant.with_cold_gas(part_mass, &substance.specific_heat, shop)?,
        to_bring: (to_bring(PRACTICAL_FACTOR.0), to_bring(PRACTICAL_FACTOR.1)),
        vessel: vessel.volume,
        hourly_loss: coolant.amount(hourly_loss),
        time,
        least_room: gas / (1.0 - OXYGEN_WARNING / OXYGEN_IN_AIR),
        room,
        job,
        liquid,
    }))
}

/// The coolant of a bath.
pub fn coolant(bath: Bath) -> Coolant {
    match bath {
        Bath::DryIce => DRY_ICE,
        Bath::DryIceInAlcohol => ALCOHOL.coolant(),
        Bath::DryIceInAcetone => ACETONE.coolant(),
        Bath::LiquidNitrogen => LIQUID_NITROGEN,
    }
}

/// The liquid of a bath, when it has one.
fn liquid_of(bath: Bath) -> Option<BathLiquid> {
    match bath {
        Bath::DryIceInAlcohol => Some(ALCOHOL),
        Bath::DryIceInAcetone => Some(ACETONE),
        Bath::DryIce | Bath::LiquidNitrogen => None,
    }
}

fn room_findings(
    room: Room,
    job: &JobAmounts,
    is_dry_ice: bool,
    time: f64,
) -> Result<RoomFindings, AssemblyError> {
    let gas = job.boiled.gas_volume;
    let left = |gas: f64| oxygen_after_displacement(room.volume, gas.min(room.volume));
    let (oxygen, oxygen_spilled) = (left(gas)?, left(job.total.gas_volume)?);
    let air = room.air_changes * room.volume / 3600.0;
    let carbon_dioxide = if is_dry_ice { Some(carbon_dioxide_share(room.volume, gas)?) } else { None };
    Ok(RoomFindings {
        room,
        oxygen,
        oxygen_ventilated: oxygen_ventilated(room.volume, air, gas / time, time)?,
        oxygen_spilled,
        level: oxygen_level(oxygen),
        level_spilled: oxygen_level(oxygen_spilled),
        carbon_dioxide,
    })
}
