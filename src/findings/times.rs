//! How long the parts soak, and how long there is from oven or bath to seated.

use super::AssemblyFindings;
use super::assembly_of::{bath_name, bath_temperature};
use super::frost::{self, FrostFindings};
use super::thermal_part::{Pace, body, joined_parts, substance};
use crate::assembly::AssemblyError;
use crate::assembly::conduction::{Conduction, Substance, Surroundings};
use crate::assembly::film::Film;
use crate::assembly::handling::{
    Accuracy, HUB_EMISSIVITY, HandledPart, Handling, HandlingCourse, gap_air_conductivity, still_air_films,
};
use crate::assembly::media::Medium;
use crate::assembly::soak::{QuenchStress, hour_per_inch, quench_stress, soak_to};
use crate::joint::{Bath, Joint, Method, Ring};
use crate::material::Kind;

/// Where the heat exchange in boiling nitrogen comes from.
const BOILING: &str = "boiling curve of nitrogen, film branch of Breen and Westwater (1962), the rest after NBS Technical \
                       Note 317 (from memory); good to some tens of per cent";
/// Share of the step at which a part counts as soaked.
const SOAKED: f64 = 0.99;
/// Rings of the coarser mesh and allowed error of a step of a soak; times to a thousandth.
const MESH: (usize, f64) = (4, 1e-4);
/// The same in boiling nitrogen, whose film is known to some tens of per cent; times to a hundredth.
const BOILING_MESH: (usize, f64) = (2, 1e-3);

/// Soak times and the time there is.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Times {
    /// The hub in its oven; none when it is not heated, or heated by induction.
    pub hub: Option<SoakFindings>,
    /// The shaft in its bath; none when it is not chilled.
    pub shaft: Option<SoakFindings>,
    /// From oven or bath to seated.
    pub handling: Option<HandlingFindings>,
    /// Why a time does not exist; full sentences.
    pub gaps: Vec<String>,
}

/// One part in its oven or bath.
#[derive(Debug, Clone, PartialEq)]
pub struct SoakFindings {
    /// Name of the part.
    pub part: String,
    /// What it soaks in.
    pub medium: &'static str,
    /// Temperature of the medium, K.
    pub medium_temperature: f64,
    /// Mean temperature that is needed, K.
    pub wanted: f64,
    /// Time until the mean is there, s; none when it never is.
    pub to_wanted: Option<f64>,
    /// Time until the mean has covered 90, 95 and 99 % of the step, s.
    pub marks: [f64; 3],
    /// Greatest difference between inside and outside on the way, K.
    pub greatest_difference: f64,
    /// When it occurs, s.
    pub greatest_difference_at: f64,
    /// The old shop rule of an hour for every inch of section, s.
    pub hour_per_inch: f64,
    /// Heat that goes into the part, or out of it, J.
    pub heat: f64,
    /// Thermal stress of a brittle part with its tensile strength, Pa; none for others.
    pub quench: Option<(QuenchStress, Option<f64>)>,
    /// Where the heat exchange comes from.
    pub source: &'static str,
}

/// From oven or bath to seated.
#[derive(Debug, Clone, PartialEq)]
pub struct HandlingFindings {
    /// Temperature of the hub as it leaves, K.
    pub hub_temperature: f64,
    /// Temperature of the shaft as it leaves, K.
    pub shaft_temperature: f64,
    /// Diametral clearance at which the parts touch, m: their form error.
    pub least: f64,
    /// Course of the tightest pair.
    pub tightest: HandlingCourse,
    /// Course of the loosest pair.
    pub loosest: HandlingCourse,
    /// Frost on a chilled shaft: a bound, not counted in the courses; none when nothing settles.
    pub frost: Option<FrostFindings>,
}

/// How much of the times is worked out.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Extent {
    /// All.
    Whole,
    /// From oven or bath to seated, without soak and frost.
    Seating,
}

/// Temperatures that the method plans.
struct Plan {
    /// Mean that the hub must reach, K; none when it stays at shop temperature.
    hub_wanted: Option<f64>,
    /// What the oven is set to, K.
    oven: f64,
    /// Mean of the hub as it leaves the oven, K.
    hub: f64,
    /// Mean of the shaft as it leaves the bath, K.
    shaft: f64,
}

/// Soak and handling of the method asked for; nothing for a pressed joint.
pub(super) fn times(
    joint: &Joint,
    assembly: &AssemblyFindings,
    interference: (f64, f64),
    extent: Extent,
) -> Result<Times, AssemblyError> {
    if joint.assembly.method == Method::Press {
        return Ok(Times::default());
    }
    let plan = match plan(joint, assembly) {
        Ok(plan) => plan,
        Err(gap) => return Ok(Times { gaps: vec![gap], ..Times::default() }),
    };
    let shop = joint.assembly.shop_temperature;
    let (coldest, hottest) = (plan.shaft.min(shop), plan.oven.max(shop));
    let (shaft, hub) = &joined_parts(joint, Pace::Slow);
    let (Some(shaft_substance), Some(hub_substance)) =
        (substance(&shaft.material, coldest, hottest)?, substance(&hub.material, coldest, hottest)?)
    else {
        let gap = "Soak and handling time do not exist: a material has no conductivity or specific heat.";
        return Ok(Times { gaps: vec![gap.to_owned()], ..Times::default() });
    };
    let mut times = Times::default();
    if let Some(wanted) = plan.hub_wanted.filter(|_| extent == Extent::Whole) {
        heated(joint, hub, &hub_substance, wanted, plan.oven, &mut times)?;
    }
    if joint.assembly.chills() && extent == Extent::Whole {
        let bath = joint.assembly.bath;
        let wanted = assembly.chill_shaft.temperature.filter(|_| joint.assembly.method == Method::ChillShaft);
        times.shaft = Some(chilled(joint, shaft, &shaft_substance, wanted, bath)?);
    }
    let (shaft, hub) = &joined_parts(joint, Pace::Quick);
    let pair = Handling {
        hub: handled(hub, &hub_substance, plan.hub, joint.length),
        shaft: HandledPart {
            outer_diameter: hub.inner_diameter,
            ..handled(shaft, &shaft_substance, plan.shaft, joint.length)
        },
        length: joint.length,
        interference: interference.1,
        air_temperature: shop,
        gas_conductivity: gap_air_conductivity(plan.hub, plan.shaft),
        overlap_after: joint.assembly.practice.transfer_time,
    };
    let practice = &joint.assembly.practice;
    match seating(&pair, interference.0, practice.form_error) {
        Ok(found) if extent == Extent::Seating => times.handling = Some(found),
        Ok(mut found) => {
            match frost::frost(&pair, &found.tightest, practice.form_error, practice.humidity) {
                Ok(frost) => found.frost = frost,
                Err(error) => times.gaps.push(format!("The frost on the shaft cannot be told: {error}.")),
            }
            times.handling = Some(found);
        }
        Err(error @ (AssemblyError::OutsideCurve { .. } | AssemblyError::NotSettled { .. })) => {
            times.gaps.push(format!("The handling time does not exist: {error}."));
        }
        Err(error) => return Err(error),
    }
    Ok(times)
}

fn plan(joint: &Joint, assembly: &AssemblyFindings) -> Result<Plan, String> {
    let shop = joint.assembly.shop_temperature;
    let impossible = |why: &str| format!("Soak and handling time do not exist: {why}.");
    let bath = assembly.baths.iter().find(|bath| bath.bath == joint.assembly.bath);
    let (needed, shaft) = match (joint.assembly.method, bath) {
        (Method::HeatHub, _) => {
            let route = &assembly.heat_hub;
            let needed = route.temperature.filter(|_| route.possible);
            (needed.ok_or_else(|| impossible(&route.statement))?, shop)
        }
        (Method::ChillShaft, Some(bath)) if bath.shrinkage.is_some() => (shop, bath.temperature),
        (Method::HeatAndChill, Some(bath)) => {
            (bath.hub_temperature.ok_or_else(|| impossible(&bath.statement))?, bath.temperature)
        }
        (_, Some(bath)) => return Err(impossible(&bath.statement)),
        (_, None) => return Err(impossible("the bath is not covered")),
    };
    if needed <= shop {
        return Ok(Plan { hub_wanted: None, oven: shop, hub: shop, shaft });
    }
    let practice = &joint.assembly.practice;
    let limit = assembly.hub_limit.as_ref().map_or(f64::INFINITY, |(limit, _)| *limit);
    let end = joint.joined_last().1.material.expansion.range().1;
    let usual = (shop + (needed - shop) / SOAKED).min(limit).min(end);
    let oven = practice.oven_temperature.unwrap_or(usual);
    Ok(Plan { hub_wanted: Some(needed), oven, hub: shop + SOAKED * (oven - shop), shaft })
}

fn heated(
    joint: &Joint,
    hub: &Ring,
    substance: &Substance,
    wanted: f64,
    oven: f64,
    times: &mut Times,
) -> Result<(), AssemblyError> {
    let heating = joint.assembly.practice.heating;
    let Some((film, source)) = heating.film(hub.outer_diameter, joint.length) else {
        times.gaps.push(format!(
            "The soak time of the {} does not exist: induction heats it from inside, as fast as its power allows.",
            hub.name
        ));
        return Ok(());
    };
    let shop = joint.assembly.shop_temperature;
    let around = Surroundings::all_round(oven, film);
    let part = Conduction::new(body(hub, joint.length), substance.clone(), around, shop)?;
    times.hub = Some(soaked(hub, part, substance, wanted, heating.name(), source)?);
    Ok(())
}

fn chilled(
    joint: &Joint,
    shaft: &Ring,
    substance: &Substance,
    wanted: Option<f64>,
    bath: Bath,
) -> Result<SoakFindings, AssemblyError> {
    let medium = match bath {
        Bath::DryIce => Medium::DryIcePacked,
        Bath::DryIceInAlcohol | Bath::DryIceInAcetone => Medium::DryIceBath,
        Bath::LiquidNitrogen => Medium::NitrogenPool,
    };
    let (shop, cold) = (joint.assembly.shop_temperature, bath_temperature(bath));
    let length = joint.assembly.practice.chilled_length.unwrap_or(joint.length);
    let film = medium.film(shaft.outer_diameter);
    let mut around = Surroundings::all_round(cold, film);
    if shaft.inner_diameter == 0.0 {
        around.inner = Film::Insulated;
    }
    let part = Conduction::new(body(shaft, length), substance.clone(), around, shop)?;
    let wanted = wanted.unwrap_or(shop + SOAKED * (cold - shop));
    let source = match bath {
        Bath::LiquidNitrogen => BOILING,
        _ => medium.usual().source,
    };
    soaked(shaft, part, substance, wanted, bath_name(bath), source)
}

fn soaked(
    ring: &Ring,
    part: Conduction,
    substance: &Substance,
    wanted: f64,
    medium: &'static str,
    source: &'static str,
) -> Result<SoakFindings, AssemblyError> {
    let boils = medium == bath_name(Bath::LiquidNitrogen);
    let (rings, tolerance) = if boils { BOILING_MESH } else { MESH };
    let part = part.with_rings(rings)?.with_tolerance(tolerance)?;
    let (marks, to_wanted) = soak_to(&part, wanted)?;
    let (start, end) = (part.start(), part.surroundings_temperature());
    let mass = part.body().volume() * substance.density;
    let quench = match ring.material.kind {
        Kind::Brittle => {
            let material = &ring.material;
            let (modulus, poisson) = (material.youngs_modulus.value, material.poisson.value);
            let stress = quench_stress(&part, modulus, poisson, &material.expansion)?;
            Some((stress, ring.strength.tensile_strength))
        }
        Kind::Ductile | Kind::Polymer => None,
    };
    let section = 0.5 * (ring.outer_diameter - ring.inner_diameter);
    let section = if ring.inner_diameter > 0.0 { section } else { ring.outer_diameter };
    Ok(SoakFindings {
        part: ring.name.clone(),
        medium,
        medium_temperature: end,
        wanted,
        to_wanted: to_wanted.map(|time| time.value),
        marks: [marks.to_90_percent, marks.to_95_percent, marks.to_99_percent].map(|mark| mark.value),
        greatest_difference: marks.greatest_difference,
        greatest_difference_at: marks.greatest_difference_at,
        hour_per_inch: hour_per_inch(section.min(part.body().length))?.value,
        heat: mass * substance.specific_heat.integral(start.min(end), start.max(end))?,
        quench,
        source,
    })
}

fn handled(ring: &Ring, substance: &Substance, temperature: f64, length: f64) -> HandledPart {
    let [bore, rim, ends] = still_air_films(ring.outer_diameter, length, HUB_EMISSIVITY);
    HandledPart {
        inner_diameter: ring.inner_diameter,
        outer_diameter: ring.outer_diameter,
        substance: substance.clone(),
        expansion: ring.material.expansion.clone(),
        temperature,
        bore,
        rim,
        ends,
    }
}

fn seating(pair: &Handling, loosest: f64, least: f64) -> Result<HandlingFindings, AssemblyError> {
    let other = Handling { interference: loosest, ..pair.clone() };
    Ok(HandlingFindings {
        hub_temperature: pair.hub.temperature,
        shaft_temperature: pair.shaft.temperature,
        least,
        tightest: pair.course_with(least, Accuracy::QUICK)?,
        loosest: other.course_with(least, Accuracy::QUICK)?,
        frost: None,
    })
}
