//! How the joint is put together.

use serde::Serialize;

use super::number::{celsius, finite, microns, millimetres};
use super::seating::Seating;
use crate::findings::{AssemblyFindings, BathFindings, EarlierJoint, Findings, bath_name};
use crate::joint::{AssemblyPlan, Method};

/// The method asked for, with its temperatures and forces at the tightest pair.
#[derive(Serialize)]
pub(super) struct Assembly {
    method: &'static str,
    shop_temperature_c: f64,
    hub_temperature_c: Option<f64>,
    shaft_temperature_c: Option<f64>,
    clearance_um: f64,
    needed_um: f64,
    press_force_n: Option<f64>,
    press_rating_n: Option<f64>,
    press_travel_at_peak_mm: Option<f64>,
    press_work_j: Option<f64>,
    hub_limit_c: Option<f64>,
    baths: Vec<Bath>,
    earlier: Vec<Earlier>,
    #[serde(flatten)]
    seating: Seating,
}

/// A joint of several rings that is made before the last one; fits count from 1.
#[derive(Serialize)]
struct Earlier {
    fit: usize,
    overlap_um: f64,
    press_force_n: Option<f64>,
    hub_temperature_c: Option<f64>,
    hub_temperature_in_bath_c: Option<f64>,
    bath_alone: bool,
}

/// What one cold bath gives.
#[derive(Serialize)]
struct Bath {
    bath: &'static str,
    temperature_c: f64,
    shrinkage_um: Option<f64>,
    hub_temperature_c: Option<f64>,
    alone: bool,
    statement: String,
}

impl Assembly {
    pub(super) fn of(findings: &Findings) -> Self {
        let assembly = &findings.assembly;
        let plan = &findings.joint.assembly;
        let (hub, shaft) = temperatures(assembly, plan);
        let press = &assembly.press.tightest;
        Self {
            method: match plan.method {
                Method::Press => "press",
                Method::HeatHub => "heat hub",
                Method::ChillShaft => "chill shaft",
                Method::HeatAndChill => "heat and chill",
            },
            shop_temperature_c: celsius(plan.shop_temperature),
            hub_temperature_c: hub.map(celsius).and_then(finite),
            shaft_temperature_c: shaft.map(celsius).and_then(finite),
            clearance_um: microns(assembly.clearance),
            needed_um: microns(assembly.needed),
            press_force_n: finite(press.peak_force),
            press_rating_n: finite(assembly.press_rating),
            press_travel_at_peak_mm: finite(millimetres(press.peak_travel)),
            press_work_j: finite(press.work),
            hub_limit_c: assembly.hub_limit.as_ref().map(|(limit, _)| celsius(*limit)),
            baths: assembly.baths.iter().map(Bath::of).collect(),
            earlier: assembly.earlier.iter().map(Earlier::of).collect(),
            seating: Seating::of(assembly),
        }
    }
}

/// Temperatures of hub and shaft while they are joined; none when nothing is heated or chilled, or when the
/// expansion curve does not reach.
fn temperatures(assembly: &AssemblyFindings, plan: &AssemblyPlan) -> (Option<f64>, Option<f64>) {
    let shop = Some(plan.shop_temperature);
    match plan.method {
        Method::Press => (None, None),
        Method::HeatHub => (assembly.heat_hub.temperature, shop),
        Method::ChillShaft => (shop, assembly.chill_shaft.temperature),
        Method::HeatAndChill => {
            let chosen = assembly.baths.iter().find(|bath| bath.bath == plan.bath);
            (chosen.and_then(|bath| bath.hub_temperature), chosen.map(|bath| bath.temperature))
        }
    }
}

impl Earlier {
    fn of(found: &EarlierJoint) -> Self {
        Self {
            fit: found.interface + 1,
            overlap_um: microns(found.overlap),
            press_force_n: finite(found.press_force),
            hub_temperature_c: found.hub_temperature.map(celsius).and_then(finite),
            hub_temperature_in_bath_c: found.hub_temperature_in_bath.map(celsius).and_then(finite),
            bath_alone: found.bath_alone,
        }
    }
}

impl Bath {
    fn of(found: &BathFindings) -> Self {
        Self {
            bath: bath_name(found.bath),
            temperature_c: celsius(found.temperature),
            shrinkage_um: found.shrinkage.map(microns).and_then(finite),
            hub_temperature_c: found.hub_temperature.map(celsius).and_then(finite),
            alone: found.alone,
            statement: found.statement.clone(),
        }
    }
}
