//! The JSON document, name by name.

use serde::Serialize;

use super::service::{Bending, Service};
use super::{finite, microns};
use crate::findings::{
    DutyFindings, Findings, InterfaceFindings, PairFindings, Question, RingStress, SliceFindings,
    StateFindings, Verdict, VerdictUnit,
};
use crate::joint::{Joint, Method};
use crate::tolerance::FitLimits;

/// Everything.
#[derive(Serialize)]
pub(super) struct Document {
    findings: u8,
    version: &'static str,
    title: String,
    digest: String,
    set: Vec<String>,
    diameter_mm: f64,
    callout: String,
    character: &'static str,
    fit: Option<Fit>,
    extremes: ExtremePairs,
    onset_of_yield: Option<Onset>,
    duty: Vec<Duty>,
    service: Service,
    assembly: Assembly,
    verdicts: Vec<VerdictLine>,
    defaults: Vec<Default>,
    materials: Vec<MaterialLine>,
    cautions: Vec<String>,
    notes: Vec<String>,
}

/// Limits of both members, µm from nominal.
#[derive(Serialize)]
pub(super) struct Fit {
    hole: Microns,
    shaft: Microns,
}

/// Limits of one member, µm from nominal.
#[derive(Serialize)]
pub(super) struct Microns {
    pub(super) lower_um: f64,
    pub(super) upper_um: f64,
}

impl Fit {
    pub(super) fn of(limits: &FitLimits) -> Self {
        Self { hole: Microns::of(&limits.hole), shaft: Microns::of(&limits.shaft) }
    }
}

/// What `limits --json` prints of a fit.
#[derive(Serialize)]
pub(super) struct LimitsDocument {
    pub(super) callout: String,
    pub(super) diameter_mm: f64,
    pub(super) fit: Fit,
    pub(super) character: &'static str,
    pub(super) interference: ExtremeInterferences,
    pub(super) maximum_material_pair: &'static str,
    pub(super) least_material_pair: &'static str,
    pub(super) sources: Vec<String>,
    pub(super) remarks: Vec<String>,
}

/// Interference of the extreme pairs, µm, negative for clearance.
#[derive(Serialize)]
pub(super) struct ExtremeInterferences {
    pub(super) loosest_um: f64,
    pub(super) mean_um: f64,
    pub(super) tightest_um: f64,
}

/// What `limits --json` prints of one member.
#[derive(Serialize)]
pub(super) struct MemberDocument {
    pub(super) diameter_mm: f64,
    #[serde(skip_serializing_if = "Option::is_none")]
    pub(super) hole: Option<Microns>,
    #[serde(skip_serializing_if = "Option::is_none")]
    pub(super) shaft: Option<Microns>,
    pub(super) sources: Vec<String>,
    pub(super) remarks: Vec<String>,
}

#[derive(Serialize)]
struct ExtremePairs {
    loosest: Pair,
    mean: Pair,
    tightest: Pair,
}

/// One pair at the shop temperature, at rest. `hub_` is the outermost ring, `shaft_` the innermost.
#[derive(Serialize)]
struct Pair {
    interference_um: f64,
    smoothing_um: f64,
    effective_interference_um: f64,
    pressure_mpa: Option<f64>,
    pressure_smoothed_mpa: Option<f64>,
    pressure_unsmoothed_mpa: Option<f64>,
    hub_bore_hoop_mpa: Option<f64>,
    hub_bore_radial_mpa: Option<f64>,
    hub_bore_von_mises_mpa: Option<f64>,
    hub_rim_hoop_mpa: Option<f64>,
    shaft_surface_hoop_mpa: Option<f64>,
    shaft_bore_hoop_mpa: Option<f64>,
    shaft_von_mises_mpa: Option<f64>,
    torque_capacity_nm: Option<f64>,
    axial_capacity_n: Option<f64>,
    press_force_n: Option<f64>,
    press_force_low_n: Option<f64>,
    release_force_n: Option<f64>,
    release_force_low_n: Option<f64>,
    interfaces: Vec<Interface>,
    slices: Vec<SliceLine>,
    rings: Vec<RingLine>,
}

/// One interface, from the innermost outwards.
#[derive(Serialize)]
struct Interface {
    diameter_mm: f64,
    interference_um: f64,
    pressure_mpa: Option<f64>,
    gap_um: f64,
    open: bool,
    torque_capacity_nm: Option<f64>,
    axial_capacity_n: Option<f64>,
}

impl Interface {
    fn of(found: &InterfaceFindings) -> Self {
        Self {
            diameter_mm: found.diameter * 1e3,
            interference_um: microns(found.interference),
            pressure_mpa: mega(found.pressure),
            gap_um: microns(found.gap),
            open: found.open,
            torque_capacity_nm: finite(found.torque_capacity),
            axial_capacity_n: finite(found.axial_capacity),
        }
    }
}

/// One slice of a stepped joint; none when it is of one section.
#[derive(Serialize)]
struct SliceLine {
    length_mm: f64,
    hub_outer_diameter_mm: f64,
    shaft_bore_mm: f64,
    pressure_mpa: Option<f64>,
}

impl SliceLine {
    fn of(found: &SliceFindings) -> Self {
        Self {
            length_mm: found.length * 1e3,
            hub_outer_diameter_mm: found.hub_outer_diameter * 1e3,
            shaft_bore_mm: found.shaft_bore * 1e3,
            pressure_mpa: mega(found.pressure),
        }
    }
}

/// One ring, from the innermost outwards; at a solid ring `bore` is its centre.
#[derive(Serialize)]
struct RingLine {
    name: String,
    bore_hoop_mpa: Option<f64>,
    bore_radial_mpa: Option<f64>,
    bore_von_mises_mpa: Option<f64>,
    rim_hoop_mpa: Option<f64>,
    rim_radial_mpa: Option<f64>,
    rim_von_mises_mpa: Option<f64>,
    equivalent_mpa: Option<f64>,
    strength_mpa: Option<f64>,
    yield_safety: Option<f64>,
    bore_change_um: Option<f64>,
    outer_change_um: Option<f64>,
}

#[derive(Serialize)]
struct Onset {
    ring: String,
    pressure_mpa: Option<f64>,
    interference_um: f64,
}

#[derive(Serialize)]
struct Duty {
    state: String,
    torque_nm: f64,
    axial_force_n: f64,
    temperatures_c: Vec<f64>,
    loosest: State,
    tightest: State,
}

#[derive(Serialize)]
struct State {
    pressure_mpa: Option<f64>,
    torque_capacity_nm: Option<f64>,
    axial_capacity_n: Option<f64>,
    slip_safety: Option<f64>,
    interfaces: Vec<Interface>,
    bending: Option<Bending>,
    hub_yield_safety: Option<f64>,
    shaft_yield_safety: Option<f64>,
}

#[derive(Serialize)]
struct Assembly {
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
}

#[derive(Serialize)]
struct Bath {
    bath: &'static str,
    temperature_c: f64,
    shrinkage_um: Option<f64>,
    hub_temperature_c: Option<f64>,
    alone: bool,
    statement: String,
}

#[derive(Serialize)]
struct VerdictLine {
    question: &'static str,
    subject: String,
    required: Option<f64>,
    found: Option<f64>,
    unit: &'static str,
    ok: bool,
    at: String,
}

#[derive(Serialize)]
struct Default {
    key: String,
    value: String,
    source: String,
}

#[derive(Serialize)]
struct MaterialLine {
    ring: String,
    id: String,
    name: String,
    origin: String,
    strength_mpa: Option<f64>,
    section_mm: f64,
}

pub(super) fn mega(pascals: f64) -> Option<f64> {
    finite(pascals * 1e-6)
}

pub(super) fn celsius(kelvin: f64) -> f64 {
    let exact = kelvin - 273.15;
    let rounded = (exact * 1e9).round() / 1e9;
    rounded + 0.0
}

impl Document {
    pub(super) fn of(findings: &Findings) -> Self {
        let joint = &findings.joint;
        Self {
            findings: 1,
            version: env!("CARGO_PKG_VERSION"),
            title: joint.title.clone(),
            digest: joint.digest.clone(),
            set: joint.set.iter().map(|(key, value)| format!("{key}={value}")).collect(),
            diameter_mm: joint.diameter * 1e3,
            callout: joint.fits.first().map(|fit| fit.callout.clone()).unwrap_or_default(),
            character: super::super::terminal::character_name(findings.character),
            fit: joint.fits.first().map(|fit| Fit::of(&fit.limits)),
            extremes: ExtremePairs {
                loosest: Pair::of(joint, &findings.extremes.loosest),
                mean: Pair::of(joint, &findings.extremes.mean),
                tightest: Pair::of(joint, &findings.extremes.tightest),
            },
            onset_of_yield: findings.onset_of_yield.as_ref().map(|onset| Onset {
                ring: joint.rings.get(onset.ring).map(|ring| ring.name.clone()).unwrap_or_default(),
                pressure_mpa: mega(onset.pressure),
                interference_um: microns(onset.interference),
            }),
            duty: joint
                .duty
                .iter()
                .zip(&findings.duty)
                .map(|(state, found)| Duty::of(state, found))
                .collect(),
            service: Service::of(findings),
            assembly: Assembly::of(findings),
            verdicts: findings.verdicts.iter().map(VerdictLine::of).collect(),
            defaults: joint
                .defaults
                .iter()
                .map(|default| Default {
                    key: default.key.clone(),
                    value: default.value.clone(),
                    source: default.source.clone(),
                })
                .collect(),
            materials: materials(findings),
            cautions: findings.cautions.iter().map(|caution| caution.text.clone()).collect(),
            notes: findings.notes.clone(),
        }
    }
}

fn materials(findings: &Findings) -> Vec<MaterialLine> {
    let rings = findings.joint.rings.iter().zip(&findings.extremes.tightest.rings);
    rings
        .map(|(ring, stress)| MaterialLine {
            ring: ring.name.clone(),
            id: ring.material.id.clone(),
            name: ring.material.name.clone(),
            origin: match &ring.material.origin {
                crate::material::Origin::BuiltIn => "built in".to_owned(),
                crate::material::Origin::File(path) => path.display().to_string(),
                crate::material::Origin::JointFile => "joint file".to_owned(),
            },
            strength_mpa: stress.strength.and_then(mega),
            section_mm: ring.section * 1e3,
        })
        .collect()
}

impl Pair {
    fn of(joint: &Joint, pair: &PairFindings) -> Self {
        let shaft = pair.rings.first();
        let hub = pair.rings.last();
        let of = |ring: Option<&RingStress>, value: fn(&RingStress) -> f64| {
            ring.and_then(|ring| mega(value(ring)))
        };
        Self {
            interference_um: microns(pair.interference),
            smoothing_um: microns(pair.smoothing),
            effective_interference_um: microns(pair.effective_interference),
            pressure_mpa: mega(pair.pressure),
            pressure_smoothed_mpa: mega(pair.pressure_smoothed),
            pressure_unsmoothed_mpa: mega(pair.pressure_unsmoothed),
            hub_bore_hoop_mpa: of(hub, |ring| ring.bore.hoop),
            hub_bore_radial_mpa: of(hub, |ring| ring.bore.radial),
            hub_bore_von_mises_mpa: of(hub, |ring| ring.bore.von_mises),
            hub_rim_hoop_mpa: of(hub, |ring| ring.rim.hoop),
            shaft_surface_hoop_mpa: of(shaft, |ring| ring.rim.hoop),
            shaft_bore_hoop_mpa: of(shaft, |ring| ring.bore.hoop),
            shaft_von_mises_mpa: of(shaft, |ring| ring.bore.von_mises.max(ring.rim.von_mises)),
            torque_capacity_nm: finite(pair.torque_capacity),
            axial_capacity_n: finite(pair.axial_capacity),
            press_force_n: finite(pair.press_force.high),
            press_force_low_n: finite(pair.press_force.low),
            release_force_n: finite(pair.release_force.high),
            release_force_low_n: finite(pair.release_force.low),
            interfaces: pair.interfaces.iter().map(Interface::of).collect(),
            slices: pair.slices.iter().map(SliceLine::of).collect(),
            rings: joint
                .rings
                .iter()
                .zip(&pair.rings)
                .map(|(ring, stress)| RingLine::of(&ring.name, stress))
                .collect(),
        }
    }
}

impl RingLine {
    fn of(name: &str, stress: &RingStress) -> Self {
        Self {
            name: name.to_owned(),
            bore_hoop_mpa: mega(stress.bore.hoop),
            bore_radial_mpa: mega(stress.bore.radial),
            bore_von_mises_mpa: mega(stress.bore.von_mises),
            rim_hoop_mpa: mega(stress.rim.hoop),
            rim_radial_mpa: mega(stress.rim.radial),
            rim_von_mises_mpa: mega(stress.rim.von_mises),
            equivalent_mpa: mega(stress.equivalent),
            strength_mpa: stress.strength.and_then(mega),
            yield_safety: stress.safety.and_then(finite),
            bore_change_um: finite(stress.bore_change * 1e6),
            outer_change_um: finite(stress.outer_change * 1e6),
        }
    }
}

impl Duty {
    fn of(state: &crate::joint::DutyState, found: &DutyFindings) -> Self {
        Self {
            state: state.name.clone(),
            torque_nm: state.torque,
            axial_force_n: state.axial_force,
            temperatures_c: state.temperatures.iter().map(|temperature| celsius(*temperature)).collect(),
            loosest: State::of(&found.loosest),
            tightest: State::of(&found.tightest),
        }
    }
}

impl State {
    fn of(found: &StateFindings) -> Self {
        let safety = |ring: Option<&RingStress>| ring.and_then(|ring| ring.safety).and_then(finite);
        Self {
            pressure_mpa: mega(found.pressure),
            torque_capacity_nm: finite(found.torque_capacity),
            axial_capacity_n: finite(found.axial_capacity),
            slip_safety: found.slip_safety.and_then(finite),
            interfaces: found.interfaces.iter().map(Interface::of).collect(),
            bending: found.bending.as_ref().map(Bending::of),
            hub_yield_safety: safety(found.rings.last()),
            shaft_yield_safety: safety(found.rings.first()),
        }
    }
}

impl Assembly {
    fn of(findings: &Findings) -> Self {
        let assembly = &findings.assembly;
        let plan = &findings.joint.assembly;
        let chosen = assembly.baths.iter().find(|bath| bath.bath == plan.bath);
        let (method, hub, shaft) = match plan.method {
            Method::Press => ("press", None, None),
            Method::HeatHub => ("heat hub", assembly.heat_hub.temperature, Some(plan.shop_temperature)),
            Method::ChillShaft => {
                ("chill shaft", Some(plan.shop_temperature), assembly.chill_shaft.temperature)
            }
            Method::HeatAndChill => (
                "heat and chill",
                chosen.and_then(|bath| bath.hub_temperature),
                chosen.map(|bath| bath.temperature),
            ),
        };
        let press = &assembly.press.tightest;
        Self {
            method,
            shop_temperature_c: celsius(plan.shop_temperature),
            hub_temperature_c: hub.map(celsius),
            shaft_temperature_c: shaft.map(celsius),
            clearance_um: microns(assembly.clearance),
            needed_um: microns(assembly.needed),
            press_force_n: finite(press.peak_force),
            press_rating_n: finite(assembly.press_rating),
            press_travel_at_peak_mm: finite(press.peak_travel * 1e3),
            press_work_j: finite(press.work),
            hub_limit_c: assembly.hub_limit.as_ref().map(|(limit, _)| celsius(*limit)),
            baths: assembly
                .baths
                .iter()
                .map(|bath| Bath {
                    bath: crate::findings::bath_name(bath.bath),
                    temperature_c: celsius(bath.temperature),
                    shrinkage_um: bath.shrinkage.map(microns),
                    hub_temperature_c: bath.hub_temperature.map(celsius),
                    alone: bath.alone,
                    statement: bath.statement.clone(),
                })
                .collect(),
        }
    }
}

impl VerdictLine {
    fn of(verdict: &Verdict) -> Self {
        let number = |value: f64| match verdict.unit {
            VerdictUnit::Temperature => celsius(value),
            VerdictUnit::Safety | VerdictUnit::Force | VerdictUnit::Share => value,
        };
        Self {
            question: match verdict.question {
                Question::Hold => "hold",
                Question::Strength => "strength",
                Question::Assembly => "assembly",
            },
            subject: verdict.subject.clone(),
            required: verdict.required.map(number).and_then(finite),
            found: verdict.found.map(number).and_then(finite),
            unit: match verdict.unit {
                VerdictUnit::Safety | VerdictUnit::Share => "1",
                VerdictUnit::Force => "N",
                VerdictUnit::Temperature => "degC",
            },
            ok: verdict.ok,
            at: verdict.at.clone(),
        }
    }
}
