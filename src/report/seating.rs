//! Soak, handling time, cold bath, press and release in plain sentences for terminal and report.

mod pressed;

pub use pressed::{oil, press, release};

use crate::assembly::atmosphere::OxygenLevel;
use crate::assembly::frost::FROST_DENSITY;
use crate::assembly::handling::{HandlingCourse, gap_air_conductivity};
use crate::findings::cold_bath::{ColdBathFindings, RoomFindings};
use crate::findings::times::{HandlingFindings, SoakFindings};
use crate::findings::{Findings, bath_name};
use crate::joint::practice::Heating;
use crate::quantity::{Measure, display_unit, number, show};

/// Below this time minutes are given to a tenth, s.
const TENTHS: f64 = 1200.0;

/// A time that must not be passed, rounded down: seconds to two minutes, then minutes, then hours.
pub fn time_allowed(seconds: f64) -> String {
    let down = |value: f64| (value + 1e-9).floor();
    if seconds < 10.0 {
        format!("{} s", number(down(seconds * 10.0) / 10.0, 2))
    } else if seconds < 120.0 {
        format!("{:.0} s", down(seconds))
    } else if seconds < TENTHS {
        format!("{} min", number(down(seconds / 6.0) / 10.0, 4))
    } else if seconds < 7200.0 {
        format!("{:.0} min", down(seconds / 60.0))
    } else {
        format!("{} h", number(down(seconds / 360.0) / 10.0, 4))
    }
}

/// A time that must be kept, rounded up: seconds to two minutes, then minutes, then hours.
pub fn time_needed(seconds: f64) -> String {
    let up = |value: f64| (value - 1e-9).ceil().max(0.0) + 0.0;
    if seconds <= 120.0 {
        format!("{:.0} s", up(seconds))
    } else if seconds < TENTHS {
        format!("{} min", number(up(seconds / 6.0) / 10.0, 4))
    } else if seconds <= 7200.0 {
        format!("{:.0} min", up(seconds / 60.0))
    } else {
        format!("{} h", number(up(seconds / 360.0) / 10.0, 4))
    }
}

/// The headline of the assembly: how long there is from oven or bath to seated.
pub fn headline(findings: &Findings) -> Option<String> {
    let handling = findings.assembly.times.handling.as_ref()?;
    let from = place(findings);
    Some(match handling.tightest.gone {
        Some(0.0) => format!("Tightest pair: no time, the clearance is gone before it leaves the {from}."),
        Some(gone) => format!("Tightest pair: {} from {from} to seated.", time_allowed(gone)),
        None => format!(
            "Tightest pair: it still passes when both parts are at shop temperature; no hurry from {from} to seated."
        ),
    })
}

/// Where the clock starts.
fn place(findings: &Findings) -> &'static str {
    let plan = &findings.joint.assembly;
    let is_hot = findings.assembly.times.handling.as_ref();
    let is_hot = is_hot.is_some_and(|handling| handling.hub_temperature > plan.shop_temperature);
    match plan.practice.heating {
        _ if !is_hot => "bath",
        Heating::ForcedOven | Heating::StillOven => "oven",
        Heating::OilBath => "oil bath",
        Heating::Induction => "heater",
    }
}

/// What else there is to know of the handling time.
pub fn handling(findings: &Findings) -> Option<String> {
    let found = findings.assembly.times.handling.as_ref()?;
    let joint = &findings.joint;
    let (shaft, hub) = joint.joined_last();
    let temperature = |kelvin| show(Measure::Temperature, kelvin, joint.display);
    let deviation = |metres| show(Measure::Deviation, metres, joint.display);
    let (tight, loose) = (&found.tightest, &found.loosest);
    let begin = |course: &HandlingCourse| course.points.first().map_or(0.0, |point| point.clearance);
    let gone = |time: Option<f64>| {
        time.map_or_else(|| "never gone".to_owned(), |time| format!("gone after {}", time_allowed(time)))
    };
    let overlap = joint.assembly.practice.transfer_time;
    let overlap =
        if overlap > 0.0 { format!("{} after leaving", time_needed(overlap)) } else { "at once".to_owned() };
    let touch = if found.least > 0.0 {
        format!(" down to the form error of {}", deviation(found.least))
    } else {
        String::new()
    };
    let mut text = format!(
        "{} at {} and {} at {}: the tightest pair begins with {} of clearance and the loosest with {}{touch}; it is {} \
         at the tightest and {} at the loosest pair when the parts overlap {overlap}, because heat crosses the narrow gap \
         (air of {} W/m.K); in air alone it would be {} at the tightest pair.",
        super::typeset::capital(&hub.name),
        temperature(found.hub_temperature),
        shaft.name,
        temperature(found.shaft_temperature),
        deviation(begin(tight)),
        deviation(begin(loose)),
        gone(tight.gone),
        gone(loose.gone),
        number(gap_air_conductivity(found.hub_temperature, found.shaft_temperature), 2),
        gone(tight.gone_in_air)
    );
    if joint.assembly.chills() {
        text.push_str(&frost(findings, found));
    }
    Some(text)
}

/// The bound on the frost beside the times, in which it is not counted.
fn frost(findings: &Findings, handling: &HandlingFindings) -> String {
    let joint = &findings.joint;
    let (shaft, _) = joint.joined_last();
    let deviation = |metres: f64| show(Measure::Deviation, metres, joint.display);
    let Some(frost) = &handling.frost else {
        return format!(" No frost settles on the {} in this room, or none that can be told.", shaft.name);
    };
    let humidity = number(frost.humidity * 100.0, 3);
    let share = number(frost.share * 100.0, 2);
    let Some(end) = &frost.at_end else {
        let growth = frost.deposit.growth();
        return format!(
            " Frost is not counted in these times: at {humidity} % humidity at most {} to {} a minute settle on the {} ({} to {} kg/m³), \
             with {share} % of the heat that the air brings.",
            deviation(60.0 * growth.low).number,
            deviation(60.0 * growth.high),
            shaft.name,
            number(FROST_DENSITY.high, 3),
            number(FROST_DENSITY.low, 3)
        );
    };
    let begin = handling.tightest.points.first().map_or(0.0, |point| point.clearance);
    format!(
        " Frost is not counted in these times. A seat of the {} that stands in the open at {humidity} % humidity gathers at most {} \
         to {} of it ({} to {} kg/m³) by the end of that time, against {} of clearance to each side at the start; its heat, at \
         most {} W or {share} % of what the air brings, warms the {} by {} and takes {}. Counted so, the tightest pair allows {}.",
        shaft.name,
        deviation(end.thickness.low).number,
        deviation(end.thickness.high),
        number(FROST_DENSITY.high, 3),
        number(FROST_DENSITY.low, 3),
        deviation(0.5 * begin),
        number(frost.heat, 3),
        shaft.name,
        show(Measure::TemperatureDifference, end.warming, joint.display),
        deviation(end.by_heat),
        time_allowed(end.gone)
    )
}

/// Soak of the hub, chill of the shaft, and why a time does not exist.
pub fn soaks(findings: &Findings) -> Vec<String> {
    let times = &findings.assembly.times;
    let mut all: Vec<String> =
        [&times.hub, &times.shaft].into_iter().flatten().map(|soak| soak_of(findings, soak)).collect();
    all.extend(times.gaps.iter().cloned());
    all
}

/// One part in its oven or bath.
pub fn soak_of(findings: &Findings, soak: &SoakFindings) -> String {
    let system = findings.joint.display;
    let temperature = |kelvin| show(Measure::Temperature, kelvin, system);
    let [to_90, to_95, to_99] = soak.marks.map(time_needed);
    let wanted = match soak.to_wanted {
        Some(time) => format!("its mean is at {} after {}", temperature(soak.wanted), time_needed(time)),
        None => format!("its mean never comes to {}", temperature(soak.wanted)),
    };
    let mut text = format!(
        "{} in {} at {}: {wanted} (90 % of the step after {to_90}, 95 % after {to_95}, 99 % after {to_99}); inside and \
         outside differ by up to {}. The shop rule of an hour for every inch gives {}. Heat exchange: {}.",
        super::typeset::capital(&soak.part),
        soak.medium,
        temperature(soak.medium_temperature),
        show(Measure::TemperatureDifference, soak.greatest_difference, system),
        time_needed(soak.hour_per_inch),
        soak.source
    );
    if findings.assembly.times.handling.is_some() {
        text.push_str(" The time to seat the parts counts from the 99 %.");
    }
    if let Some((stress, strength)) = &soak.quench {
        let against = match strength {
            Some(strength) => format!(" of its {}", show(Measure::Pressure, *strength, system)),
            None => String::new(),
        };
        text.push_str(&format!(
            " The uneven temperature stresses the brittle part with up to {}{against}.",
            show(Measure::Pressure, stress.greatest(), system)
        ));
    }
    text
}

/// What the chilling takes, and what it does to the air.
pub fn cold_bath(findings: &Findings) -> Vec<String> {
    let Some(found) = &findings.assembly.cold_bath else { return Vec::new() };
    let system = findings.joint.display;
    let brief = |measure, value| {
        let unit = display_unit(measure, system);
        format!("{} {}", number(unit.of(value), 3), unit.name)
    };
    let mass = |kilograms| brief(Measure::Mass, kilograms);
    let liquid = |cubic_metres| brief(Measure::Volume, cubic_metres);
    let job = &found.job;
    let mut all = vec![match &found.liquid {
        None => format!(
            "{} to bring: {} to {} ({} boils off at the part, {} at rest over {}, {} fills a bath of {} round it and stays over; \
             with the cold gas put to use the part takes {}). At rest the bath loses {} an hour.",
            super::typeset::capital(bath_name(found.bath)),
            mass(found.to_bring.0),
            mass(found.to_bring.1),
            mass(job.part.mass),
            mass(job.idle.mass),
            time_needed(found.time),
            mass(job.cover.mass),
            liquid(found.vessel),
            mass(found.with_cold_gas.mass),
            liquid(found.hourly_loss.volume)
        ),
        Some(held) => format!(
            "Dry ice to bring: {} to {}, with {} ({}) of {} for a bath of {} round the part. {} goes off to cool the {name}, {} at the \
             part, {} at rest over {}. Put the part in when the {name} has stopped foaming; flash point {}.",
            mass(found.to_bring.0),
            mass(found.to_bring.1),
            liquid(held.volume),
            mass(held.mass),
            held.liquid.name,
            liquid(found.vessel),
            mass(held.ice.mass),
            mass(job.part.mass),
            mass(job.idle.mass),
            time_needed(found.time),
            show(Measure::Temperature, held.liquid.flash_point, system),
            name = held.liquid.name
        ),
    }];
    all.push(match &found.room {
        Some(room) => air(found, room),
        None => format!(
            "It gives off {} m³ of gas: without ventilation the room must hold at least {} m³ for its oxygen to stay above 19.5 %. \
             Give assembly.room for the oxygen that is left.",
            number(job.boiled.gas_volume, 3),
            number(found.least_room.ceil(), 6)
        ),
    });
    all
}

/// The air of the room in a sentence.
pub fn air(found: &ColdBathFindings, air: &RoomFindings) -> String {
    let share = |value: f64| format!("{:.1} %", (value * 1000.0 + 1e-9).floor() / 10.0);
    let judged = |level| match level {
        OxygenLevel::Sufficient => "above the limit of 19.5 %",
        OxygenLevel::Deficient => "BELOW the limit of 19.5 %",
        OxygenLevel::Alarm => "BELOW the alarm level of 18 %",
    };
    let mut text = format!(
        "The gas, {} m³, leaves {} of oxygen in the room of {} m³, {}; mixed with {} air changes an hour {}.",
        number(found.job.boiled.gas_volume, 3),
        share(air.oxygen),
        number(air.room.volume, 4),
        judged(air.level),
        number(air.room.air_changes, 3),
        share(air.oxygen_ventilated)
    );
    // The ice in a liquid is reckoned to go off anyhow.
    if found.liquid.is_none() {
        text.push_str(&format!(
            " If all {} m³ of a spilled bath came free at once: {}, {}.",
            number(found.job.total.gas_volume, 3),
            share(air.oxygen_spilled),
            judged(air.level_spilled)
        ));
    }
    if let Some(carbon_dioxide) = air.carbon_dioxide {
        text.push_str(&format!(
            " Carbon dioxide would be {} %, against 0.5 % for eight hours and 1.5 % for fifteen minutes.",
            number(carbon_dioxide * 100.0, 2)
        ));
    }
    text
}

/// What the coefficient at 20 °C would have said.
pub fn coefficients(findings: &Findings) -> Vec<String> {
    let system = findings.joint.display;
    let deviation = |metres: f64| show(Measure::Deviation, metres, system);
    findings
        .assembly
        .constant_coefficient
        .iter()
        .filter(|part| part.by_curve != 0.0)
        .map(|part| {
            let error = part.by_coefficient / part.by_curve - 1.0;
            format!(
                "The {} at {} changes by {}; one coefficient from 20 °C would say {}, {} % too {}.",
                part.part,
                show(Measure::Temperature, part.temperature, system),
                deviation(part.by_curve),
                deviation(part.by_coefficient),
                number(error.abs() * 100.0, 2),
                if error > 0.0 { "much" } else { "little" }
            )
        })
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn times_allowed_are_rounded_down_and_times_needed_up() {
        assert_eq!(time_allowed(3.97), "3.9 s");
        assert_eq!(time_allowed(38.99), "38 s");
        assert_eq!(time_allowed(179.0), "2.9 min");
        assert_eq!(time_allowed(11_298.9), "3.1 h");
        assert_eq!(time_needed(38.01), "39 s");
        assert_eq!(time_needed(121.0), "2.1 min");
        assert_eq!(time_needed(7201.0), "2.1 h");
        assert_eq!(time_needed(0.0), "0 s");
    }
}
