//! Oven, bath, room and handling.

use crate::joint::assembly_keys::{AssemblyKeys, RoomKeys, VesselKeys};
use crate::joint::draft::Draft;
use crate::joint::file::JointFile;
use crate::joint::practice::{HUMIDITY, Heating, Practice, Room, TEMPERATURE_LAG, Vessel};
use crate::joint::written::{At, Written};
use crate::joint::{Method, Ring};
use crate::quantity::{Kind, Number, SmallLength, Temperature, Time, written};

/// Greatest time that is read, s: a week (common practice, no source).
const LONGEST: f64 = 604_800.0;

/// What is known of oven, bath, room and handling.
pub(super) fn practice(
    draft: &mut Draft<'_>,
    keys: Option<&AssemblyKeys>,
    method: Option<Method>,
    shop: Option<f64>,
    rings: &[Ring],
) -> Option<Practice> {
    let silent = AssemblyKeys::default();
    let keys = keys.unwrap_or(&silent);
    let heats = matches!(method, Some(Method::HeatHub | Method::HeatAndChill));
    let chills = matches!(method, Some(Method::ChillShaft | Method::HeatAndChill));
    let heating = heating(draft, keys, heats);
    let oven_temperature = oven(draft, keys.oven_temperature.as_ref(), shop, rings);
    let form_error = allowance(draft, keys.form_error.as_ref(), "form_error", heats || chills);
    let handling_allowance =
        allowance(draft, keys.handling_allowance.as_ref(), "handling_allowance", heats || chills);
    let transfer_time = transfer_time(draft, keys, heats || chills);
    let handling_time = time(draft, keys.handling_time.as_ref(), false);
    let room = keys.room.as_ref().map(|room| read_room(draft, room));
    let vessel = read_vessel(draft, keys.vessel.as_ref(), chills);
    let chilled_length = keys.chilled_length.as_ref().map(|given| draft.positive(given));
    let humidity = humidity(draft, keys.humidity.as_ref(), chills);
    let temperature_lag = temperature_lag(draft, keys.temperature_lag.as_ref());
    remark_on_idle_keys(draft, keys, heats, chills);
    Some(Practice {
        heating: heating?,
        oven_temperature: oven_temperature?,
        form_error: form_error?,
        handling_allowance: handling_allowance?,
        handling_time: handling_time?,
        transfer_time: transfer_time?,
        room: present(room)?,
        vessel: vessel?,
        chilled_length: present(chilled_length)?,
        humidity: humidity?,
        temperature_lag: temperature_lag?,
    })
}

/// What oven, bath and handling cannot be beside the rest: `seat` is the length that carries, m.
pub(super) fn refuse_impossible(draft: &Draft<'_>, file: &JointFile, practice: &Practice, seat: Option<f64>) {
    let Some(keys) = file.assembly.as_ref().map(|at| &at.value) else { return };
    if let (Some(given), Some(chilled), Some(seat)) = (&keys.chilled_length, practice.chilled_length, seat)
        && seat - chilled > 1e-9
    {
        let seat = written(Kind::Length, seat);
        draft.refuse(given, &format!("is less than the seat of {seat}: what stays warm does not enter"));
    }
    if let (Some(given), Some(needed)) = (&keys.transfer_time, &keys.handling_time)
        && practice.handling_time.is_some_and(|needed| practice.transfer_time >= needed)
    {
        let needed = draft.called(needed);
        draft.refuse(given, &format!("leaves nothing of the {needed} to seat the part in"));
    }
}

/// A value that may be missing, but must be right when it is there: none when it is wrong.
fn present<T>(value: Option<Option<T>>) -> Option<Option<T>> {
    match value {
        Some(Some(value)) => Some(Some(value)),
        Some(None) => None,
        None => Some(None),
    }
}

fn heating(draft: &mut Draft<'_>, keys: &AssemblyKeys, heats: bool) -> Option<Heating> {
    if let Some(given) = &keys.medium {
        return draft.value(given);
    }
    if heats {
        let source = "heats a hub evenly all round (common practice, no source)";
        draft.default("assembly.medium", Heating::ForcedOven.name(), source);
    }
    Some(Heating::ForcedOven)
}

fn oven(
    draft: &Draft<'_>,
    given: Option<&Written<Temperature>>,
    shop: Option<f64>,
    rings: &[Ring],
) -> Option<Option<f64>> {
    let Some(given) = given else { return Some(None) };
    let temperature = draft.value(given)?;
    if shop.is_some_and(|shop| temperature <= shop) {
        draft.refuse(given, "is not above the shop temperature");
        return None;
    }
    if let Some(hub) = rings.last() {
        let (_, end) = hub.material.expansion.range();
        if temperature > end {
            let end = written(Kind::Temperature, end);
            draft.refuse(
                given,
                &format!(
                    "is outside the expansion curve of {} ({}), which ends at {end}",
                    hub.material.id, hub.name
                ),
            );
            return None;
        }
    }
    Some(Some(temperature))
}

fn allowance(
    draft: &mut Draft<'_>,
    given: Option<&Written<SmallLength>>,
    key: &str,
    used: bool,
) -> Option<f64> {
    if let Some(given) = given {
        return draft.not_negative(given);
    }
    if used {
        let source = "taken as held by the clearance wanted (common practice, no source)";
        draft.default(format!("assembly.{key}"), "0 um", source);
    }
    Some(0.0)
}

fn transfer_time(draft: &mut Draft<'_>, keys: &AssemblyKeys, used: bool) -> Option<f64> {
    if let Some(given) = &keys.transfer_time {
        return time(draft, Some(given), true).map(|time| time.unwrap_or(0.0));
    }
    if used {
        let source = "the safe side: heat crosses the gap from the first second on";
        draft.default("assembly.transfer_time", "0 s", source);
    }
    Some(0.0)
}

fn time(draft: &Draft<'_>, given: Option<&Written<Time>>, zero: bool) -> Option<Option<f64>> {
    let Some(given) = given else { return Some(None) };
    let time = draft.not_negative(given)?;
    if time == 0.0 && !zero {
        draft.refuse(given, "must be more than zero");
        return None;
    }
    if time > LONGEST {
        draft.refuse(given, "is more than a week");
        return None;
    }
    Some(Some(time))
}

fn read_room(draft: &mut Draft<'_>, room: &At<RoomKeys>) -> Option<Room> {
    let volume = draft.required(room.node, "volume", "60 m3", room.value.volume.as_ref());
    let volume = volume.and_then(|given| above_zero(draft, given));
    let air_changes = match &room.value.air_changes {
        Some(given) => draft.not_negative(given),
        None => {
            let source = "the safe side: no ventilation is counted on";
            draft.default("assembly.room.air_changes", "0", source);
            Some(0.0)
        }
    };
    Some(Room { volume: volume?, air_changes: air_changes? })
}

fn read_vessel(
    draft: &mut Draft<'_>,
    vessel: Option<&At<VesselKeys>>,
    chills: bool,
) -> Option<Option<Vessel>> {
    let Some(vessel) = vessel else {
        if chills {
            let source = "a box of twice the volume round the part that loses a twentieth of it in an hour \
                          (common practice, no source)";
            draft.default("assembly.vessel", "twice the volume round the part", source);
        }
        return Some(None);
    };
    let volume = draft.required(vessel.node, "volume", "20 l", vessel.value.volume.as_ref());
    let volume = volume.and_then(|given| above_zero(draft, given));
    let hourly_loss = vessel.value.hourly_loss.as_ref().map(|given| draft.not_negative(given));
    Some(Some(Vessel { volume: volume?, hourly_loss: present(hourly_loss)? }))
}

fn above_zero<L: crate::joint::written::Leaf<Value = f64>>(
    draft: &Draft<'_>,
    given: &Written<L>,
) -> Option<f64> {
    let value = draft.value(given)?;
    if value > 0.0 {
        return Some(value);
    }
    draft.refuse(given, "must be more than zero");
    None
}

fn humidity(draft: &mut Draft<'_>, given: Option<&Written<Number>>, chills: bool) -> Option<f64> {
    let Some(given) = given else {
        if chills {
            let source = "an ordinary room; damp weather brings 0.8 and more (common practice, no source)";
            draft.default("assembly.humidity", written(Kind::Number, HUMIDITY), source);
        }
        return Some(HUMIDITY);
    };
    let humidity = draft.value(given)?;
    if (0.0..=1.0).contains(&humidity) {
        return Some(humidity);
    }
    draft.refuse(given, "must be from 0 (dry) to 1 (saturated), such as 0.5 for 50 %");
    None
}

fn temperature_lag(draft: &mut Draft<'_>, given: Option<&Written<Number>>) -> Option<f64> {
    let Some(given) = given else {
        let source = "the shaft warms half as much as the hub (common practice, no source)";
        draft.default("assembly.temperature_lag", written(Kind::Number, TEMPERATURE_LAG), source);
        return Some(TEMPERATURE_LAG);
    };
    let lag = draft.value(given)?;
    if (0.0..=1.0).contains(&lag) {
        return Some(lag);
    }
    draft.refuse(given, "must be from 0 (both warm alike) to 1 (the shaft stays cold)");
    None
}

/// What the method does not use is said, so that it does not pass unseen.
fn remark_on_idle_keys(draft: &mut Draft<'_>, keys: &AssemblyKeys, heats: bool, chills: bool) {
    let idle = [
        ("medium", keys.medium.is_some() && !heats, "does not heat the hub"),
        ("oven_temperature", keys.oven_temperature.is_some() && !heats, "does not heat the hub"),
        ("handling_time", keys.handling_time.is_some() && !heats && !chills, "neither heats nor chills"),
        ("transfer_time", keys.transfer_time.is_some() && !heats && !chills, "neither heats nor chills"),
        ("form_error", keys.form_error.is_some() && !heats && !chills, "neither heats nor chills"),
        (
            "handling_allowance",
            keys.handling_allowance.is_some() && !heats && !chills,
            "neither heats nor chills",
        ),
        ("room", keys.room.is_some() && !chills, "uses no cold bath"),
        ("vessel", keys.vessel.is_some() && !chills, "uses no cold bath"),
        ("chilled_length", keys.chilled_length.is_some() && !chills, "uses no cold bath"),
        ("humidity", keys.humidity.is_some() && !chills, "uses no cold bath"),
    ];
    for (key, is_idle, why) in idle {
        if is_idle {
            draft.remarks.push(format!("The key assembly.{key} is not used: the method of assembly {why}."));
        }
    }
}
