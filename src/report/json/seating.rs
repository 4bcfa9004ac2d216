//! Soak, handling, cold bath, press and release.

use serde::Serialize;

use super::number::{celsius, finite, mega, microns};
use crate::assembly::handling::HandlingCourse;
use crate::assembly::oil::OIL_PLANNED;
use crate::findings::cold_bath::{ColdBathFindings, RoomFindings};
use crate::findings::frost::FrostFindings;
use crate::findings::oil::{OilFindings, OilPair};
use crate::findings::press_work::PressWorkFindings;
use crate::findings::times::{HandlingFindings, SoakFindings};
use crate::findings::{AssemblyFindings, ConstantCoefficient, bath_name};

/// Most points of a course that are written.
const POINTS: usize = 40;

/// What the method takes and how the joint comes apart.
#[derive(Serialize)]
pub(super) struct Seating {
    /// Time from oven or bath until no clearance is left at the tightest pair.
    handling_time_s: Option<f64>,
    hub_soak: Option<Soak>,
    shaft_chill: Option<Soak>,
    handling: Option<Handling>,
    cold_bath: Option<ColdBath>,
    constant_coefficient: Vec<Coefficient>,
    press_work: Option<PressWork>,
    oil_injection: Option<Oil>,
}

#[derive(Serialize)]
struct Soak {
    part: String,
    medium: &'static str,
    medium_temperature_c: f64,
    wanted_c: f64,
    to_wanted_s: Option<f64>,
    to_90_percent_s: f64,
    to_95_percent_s: f64,
    to_99_percent_s: f64,
    greatest_difference_k: f64,
    greatest_difference_at_s: f64,
    hour_per_inch_s: f64,
    heat_j: f64,
    quench_stress_mpa: Option<f64>,
    source: &'static str,
}

#[derive(Serialize)]
struct Handling {
    hub_temperature_c: f64,
    shaft_temperature_c: f64,
    least_clearance_um: f64,
    tightest: Course,
    loosest: Course,
    frost: Option<Frost>,
}

/// A bound on the frost; not counted in the courses.
#[derive(Serialize)]
struct Frost {
    humidity: f64,
    vapour_kg_m3: f64,
    deposit_kg_m2_s: f64,
    film_w_m2_k: f64,
    heat_w: f64,
    heat_share_of_air: f64,
    at_end: Option<FrostAtEnd>,
}

#[derive(Serialize)]
struct FrostAtEnd {
    time_s: f64,
    thickness_low_um: f64,
    thickness_high_um: f64,
    warming_k: f64,
    taken_by_heat_um: f64,
    gone_with_frost_s: f64,
}

#[derive(Serialize)]
struct Course {
    gone_s: Option<f64>,
    gone_in_air_s: Option<f64>,
    clearance_at_overlap_um: f64,
    points: Vec<CoursePoint>,
}

#[derive(Serialize)]
struct CoursePoint {
    time_s: f64,
    clearance_um: f64,
    hub_temperature_c: f64,
    shaft_temperature_c: f64,
}

#[derive(Serialize)]
struct ColdBath {
    bath: &'static str,
    part_mass_kg: f64,
    boiled_by_part_kg: f64,
    boiled_at_rest_kg: f64,
    boiled_by_liquid_kg: Option<f64>,
    liquid: Option<&'static str>,
    liquid_l: Option<f64>,
    liquid_kg: Option<f64>,
    liquid_flash_point_c: Option<f64>,
    cover_kg: f64,
    with_cold_gas_kg: f64,
    to_bring_low_kg: f64,
    to_bring_high_kg: f64,
    vessel_l: f64,
    hourly_loss_kg: f64,
    time_s: f64,
    gas_m3: f64,
    least_room_m3: f64,
    room: Option<Room>,
}

#[derive(Serialize)]
struct Room {
    volume_m3: f64,
    air_changes_per_hour: f64,
    oxygen_percent: f64,
    oxygen_ventilated_percent: f64,
    oxygen_spilled_percent: f64,
    oxygen_limit_percent: f64,
    carbon_dioxide_percent: Option<f64>,
}

#[derive(Serialize)]
struct Coefficient {
    part: String,
    temperature_c: f64,
    by_curve_um: f64,
    by_coefficient_um: f64,
}

#[derive(Serialize)]
struct PressWork {
    press_n: Option<f64>,
    press_metric_tons: Option<f64>,
    press_us_tons: Option<f64>,
    seat_rise_k: Option<f64>,
    parts_rise_k: Option<f64>,
    shaft_face_mpa: Option<f64>,
    shaft_face_safety: Option<f64>,
    hub_face_mpa: Option<f64>,
    hub_face_safety: Option<f64>,
    buckling_n: Option<f64>,
    slenderness: Option<f64>,
    push_out_start_low_n: f64,
    push_out_start_high_n: f64,
    push_out_sliding_low_n: f64,
    push_out_sliding_high_n: f64,
    push_out_press_n: f64,
    release_hub_temperature_c: Option<f64>,
    oil_pressure_mpa: Option<f64>,
    oil_hub_safety: Option<f64>,
}

/// Oil injection at both extremes.
#[derive(Serialize)]
struct Oil {
    planned_over_contact: f64,
    loosest: Option<OilOfPair>,
    tightest: OilOfPair,
}

#[derive(Serialize)]
struct OilOfPair {
    least_mpa: Option<f64>,
    usual_low_mpa: Option<f64>,
    usual_high_mpa: Option<f64>,
    planned_mpa: Option<f64>,
    film_um: f64,
    hub_safety: Option<f64>,
    shaft_safety: Option<f64>,
    hub_limit_mpa: Option<f64>,
    shaft_limit_mpa: Option<f64>,
}

impl Seating {
    pub(super) fn of(assembly: &AssemblyFindings) -> Self {
        let times = &assembly.times;
        Self {
            handling_time_s: times.handling.as_ref().and_then(|handling| handling.tightest.gone),
            hub_soak: times.hub.as_ref().map(Soak::of),
            shaft_chill: times.shaft.as_ref().map(Soak::of),
            handling: times.handling.as_ref().map(Handling::of),
            cold_bath: assembly.cold_bath.as_ref().map(ColdBath::of),
            constant_coefficient: assembly.constant_coefficient.iter().map(Coefficient::of).collect(),
            press_work: assembly.press_work.as_ref().map(|found| PressWork::of(found, assembly.oil.as_ref())),
            oil_injection: assembly.oil.as_ref().map(Oil::of),
        }
    }
}

impl Soak {
    fn of(found: &SoakFindings) -> Self {
        let [to_90_percent_s, to_95_percent_s, to_99_percent_s] = found.marks;
        Self {
            part: found.part.clone(),
            medium: found.medium,
            medium_temperature_c: celsius(found.medium_temperature),
            wanted_c: celsius(found.wanted),
            to_wanted_s: found.to_wanted,
            to_90_percent_s,
            to_95_percent_s,
            to_99_percent_s,
            greatest_difference_k: found.greatest_difference,
            greatest_difference_at_s: found.greatest_difference_at,
            hour_per_inch_s: found.hour_per_inch,
            heat_j: found.heat,
            quench_stress_mpa: found.quench.as_ref().and_then(|(stress, _)| mega(stress.greatest())),
            source: found.source,
        }
    }
}

impl Handling {
    fn of(found: &HandlingFindings) -> Self {
        Self {
            hub_temperature_c: celsius(found.hub_temperature),
            shaft_temperature_c: celsius(found.shaft_temperature),
            least_clearance_um: microns(found.least),
            tightest: Course::of(&found.tightest),
            loosest: Course::of(&found.loosest),
            frost: found.frost.as_ref().map(Frost::of),
        }
    }
}

impl Frost {
    fn of(found: &FrostFindings) -> Self {
        Self {
            humidity: found.humidity,
            vapour_kg_m3: found.vapour,
            deposit_kg_m2_s: found.deposit.rate,
            film_w_m2_k: found.deposit.film,
            heat_w: found.heat,
            heat_share_of_air: found.share,
            at_end: found.at_end.as_ref().map(|end| FrostAtEnd {
                time_s: end.time,
                thickness_low_um: microns(end.thickness.low),
                thickness_high_um: microns(end.thickness.high),
                warming_k: end.warming,
                taken_by_heat_um: microns(end.by_heat),
                gone_with_frost_s: end.gone,
            }),
        }
    }
}

impl Course {
    /// Every so manieth point, the last one always.
    fn of(found: &HandlingCourse) -> Self {
        let last = found.points.len().saturating_sub(1);
        let step = last.div_ceil(POINTS - 1).max(1);
        let kept = found.points.iter().enumerate().filter(|(place, _)| place % step == 0 || *place == last);
        let points = kept.map(|(_, point)| CoursePoint {
            time_s: point.time,
            clearance_um: microns(point.clearance),
            hub_temperature_c: celsius(point.hub_temperature),
            shaft_temperature_c: celsius(point.shaft_temperature),
        });
        Self {
            gone_s: found.gone,
            gone_in_air_s: found.gone_in_air,
            clearance_at_overlap_um: microns(found.clearance_at_overlap),
            points: points.collect(),
        }
    }
}

impl ColdBath {
    fn of(found: &ColdBathFindings) -> Self {
        Self {
            bath: bath_name(found.bath),
            part_mass_kg: found.part_mass,
            boiled_by_part_kg: found.job.part.mass,
            boiled_at_rest_kg: found.job.idle.mass,
            boiled_by_liquid_kg: found.liquid.map(|held| held.ice.mass),
            liquid: found.liquid.map(|held| held.liquid.name),
            liquid_l: found.liquid.map(|held| held.volume * 1e3),
            liquid_kg: found.liquid.map(|held| held.mass),
            liquid_flash_point_c: found.liquid.map(|held| celsius(held.liquid.flash_point)),
            cover_kg: found.job.cover.mass,
            with_cold_gas_kg: found.with_cold_gas.mass,
            to_bring_low_kg: found.to_bring.0,
            to_bring_high_kg: found.to_bring.1,
            vessel_l: found.vessel * 1e3,
            hourly_loss_kg: found.hourly_loss.mass,
            time_s: found.time,
            gas_m3: found.job.boiled.gas_volume,
            least_room_m3: found.least_room,
            room: found.room.as_ref().map(Room::of),
        }
    }
}

impl Room {
    fn of(found: &RoomFindings) -> Self {
        let percent = |share: f64| share * 100.0;
        Self {
            volume_m3: found.room.volume,
            air_changes_per_hour: found.room.air_changes,
            oxygen_percent: percent(found.oxygen),
            oxygen_ventilated_percent: percent(found.oxygen_ventilated),
            oxygen_spilled_percent: percent(found.oxygen_spilled),
            oxygen_limit_percent: percent(crate::assembly::atmosphere::OXYGEN_WARNING),
            carbon_dioxide_percent: found.carbon_dioxide.map(percent),
        }
    }
}

impl Coefficient {
    fn of(found: &ConstantCoefficient) -> Self {
        Self {
            part: found.part.clone(),
            temperature_c: celsius(found.temperature),
            by_curve_um: microns(found.by_curve),
            by_coefficient_um: microns(found.by_coefficient),
        }
    }
}

impl PressWork {
    fn of(found: &PressWorkFindings, oil: Option<&OilFindings>) -> Self {
        let (heating, buckling, push) = (found.heating, found.buckling, &found.push_out);
        Self {
            press_n: finite(found.size.force),
            press_metric_tons: finite(found.size.metric_tons),
            press_us_tons: finite(found.size.us_tons),
            seat_rise_k: heating.map(|heating| heating.interface_rise).and_then(finite),
            parts_rise_k: heating.map(|heating| heating.even_rise).and_then(finite),
            shaft_face_mpa: mega(found.shaft_face.stress),
            shaft_face_safety: found.shaft_face.safety.and_then(finite),
            hub_face_mpa: mega(found.hub_face.stress),
            hub_face_safety: found.hub_face.safety.and_then(finite),
            buckling_n: buckling.map(|buckling| buckling.force).and_then(finite),
            slenderness: buckling.map(|buckling| buckling.slenderness).and_then(finite),
            push_out_start_low_n: push.first_movement.low,
            push_out_start_high_n: push.first_movement.high,
            push_out_sliding_low_n: push.sliding.low,
            push_out_sliding_high_n: push.sliding.high,
            push_out_press_n: push.press,
            release_hub_temperature_c: found.release.as_ref().ok().copied().map(celsius),
            oil_pressure_mpa: oil.and_then(|oil| mega(oil.tightest.planned)),
            oil_hub_safety: oil.and_then(|oil| oil.tightest.hub_safety).and_then(finite),
        }
    }
}

impl Oil {
    fn of(found: &OilFindings) -> Self {
        Self {
            planned_over_contact: OIL_PLANNED,
            loosest: found.loosest.as_ref().map(OilOfPair::of),
            tightest: OilOfPair::of(&found.tightest),
        }
    }
}

impl OilOfPair {
    fn of(found: &OilPair) -> Self {
        Self {
            least_mpa: mega(found.least),
            usual_low_mpa: mega(found.usual.low),
            usual_high_mpa: mega(found.usual.high),
            planned_mpa: mega(found.planned),
            film_um: microns(found.film),
            hub_safety: found.hub_safety.and_then(finite),
            shaft_safety: found.shaft_safety.and_then(finite),
            hub_limit_mpa: found.hub_limit.and_then(mega),
            shaft_limit_mpa: found.shaft_limit.and_then(mega),
        }
    }
}
