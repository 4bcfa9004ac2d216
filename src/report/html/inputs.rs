//! The joint as understood: every value with its key, and whether it was given or taken as a default.

use maud::{Markup, html};

use super::table::{range_text, safety_required, scrolling};
use super::{Sheet, part};
use crate::findings::bath_name;
use crate::joint::{Allow, Joint, Method, Ring, Slice, SmoothingAt};
use crate::material::{Kind, Range};
use crate::mechanics::criteria::DuctileCriterion;
use crate::quantity::UnitSystem;
use crate::report::typeset::THIN;
use crate::report::units::Measure;

/// One value of the joint file.
struct Input {
    key: String,
    value: String,
    /// Where the value comes from, when the joint carries it.
    source: Option<String>,
}

impl Input {
    fn new(key: impl Into<String>, value: impl Into<String>) -> Self {
        Self { key: key.into(), value: value.into(), source: None }
    }

    fn from(mut self, source: &str) -> Self {
        self.source = Some(source.to_owned());
        self
    }
}

/// The table of inputs and the defaults that stand in no row of it.
pub(super) fn body(sheet: Sheet) -> Markup {
    let joint = &sheet.findings.joint;
    let groups = [
        ("Geometry", geometry(sheet)),
        ("Fit", fits(sheet)),
        ("Friction", friction(sheet)),
        ("Assembly", assembly(sheet)),
        ("Smoothing and criterion", smoothing(sheet)),
        ("Requirements", requirements(sheet)),
        ("Display", vec![Input::new("display", display(joint.display))]),
    ];
    let known: Vec<&str> =
        groups.iter().flat_map(|(_, rows)| rows.iter().map(|input| input.key.as_str())).collect();
    let others: Vec<Input> = joint
        .defaults
        .iter()
        .filter(|default| !known.contains(&default.key.as_str()))
        .map(|default| Input::new(&default.key, &default.value))
        .collect();
    let table = html! {
        thead {
            tr {
                th scope="col" { "Key of the joint file" }
                th scope="col" { "Value" }
                th scope="col" { "Given, or default and its source" }
            }
        }
        @for (heading, rows) in groups.iter().filter(|(_, rows)| !rows.is_empty()) {
            tbody {
                tr.group { th colspan="3" scope="rowgroup" { (heading) } }
                @for input in rows { (row(joint, input)) }
            }
        }
        @if !others.is_empty() {
            tbody {
                tr.group { th colspan="3" scope="rowgroup" { "Other defaults taken" } }
                @for input in &others { (row(joint, input)) }
            }
        }
    };
    html! {
        p { "The duty states stand in " (part("duty")) ", the properties of the materials in " (part("materials")) "." }
        (scrolling("Inputs", "inputs", &table))
    }
}

fn row(joint: &Joint, input: &Input) -> Markup {
    let default = joint.defaults.iter().find(|default| default.key == input.key);
    let set = joint.set.iter().any(|(key, _)| *key == input.key);
    html! {
        tr {
            th scope="row" { code { (input.key) } }
            td { (input.value) }
            td.origin {
                @match default {
                    Some(default) => { strong { "default" } " · " (default.source) }
                    None => {
                        @if set { "set on the command line" } @else { "given" }
                        @if let Some(source) = input.source.as_ref().filter(|source| !source.contains("joint file")) {
                            " · " (source)
                        }
                    }
                }
            }
        }
    }
}

fn display(system: UnitSystem) -> &'static str {
    match system {
        UnitSystem::Metric => "metric",
        UnitSystem::Inch => "inch",
    }
}

fn ring_key(joint: &Joint, index: usize) -> String {
    match (joint.rings.len(), index) {
        (2, 0) => "shaft".to_owned(),
        (2, _) => "hub".to_owned(),
        _ => format!("rings.{index}"),
    }
}

fn geometry(sheet: Sheet) -> Vec<Input> {
    let joint = &sheet.findings.joint;
    let size = |value: f64| sheet.units.text(Measure::Size, value);
    let mut rows = vec![
        Input::new("diameter", size(joint.diameter)),
        Input::new("length", size(joint.length)),
        Input::new("relief", size(joint.relief)),
    ];
    for (index, ring) in joint.rings.iter().enumerate() {
        rows.extend(ring_rows(sheet, &ring_key(joint, index), index, ring));
    }
    if !joint.slices.is_empty() {
        let piece = |slice: &Slice| {
            let bore = if slice.shaft_bore > 0.0 { size(slice.shaft_bore) } else { "solid".to_owned() };
            format!("{} long: hub {}, shaft {bore}", size(slice.length), size(slice.hub_outer_diameter))
        };
        let pieces: Vec<String> = joint.slices.iter().map(piece).collect();
        rows.push(Input::new("steps", pieces.join("; ")));
    }
    rows
}

fn ring_rows(sheet: Sheet, key: &str, index: usize, ring: &Ring) -> Vec<Input> {
    let size = |value: f64| sheet.units.text(Measure::Size, value);
    let mut rows =
        vec![Input::new(format!("{key}.material"), format!("{} ({})", ring.material.id, ring.name))];
    if index == 0 {
        let bore = if ring.inner_diameter > 0.0 { size(ring.inner_diameter) } else { "solid".to_owned() };
        rows.push(Input::new(format!("{key}.bore"), bore));
    } else {
        rows.push(Input::new(format!("{key}.outer_diameter"), size(ring.outer_diameter)));
    }
    rows.push(Input::new(format!("{key}.section"), size(ring.section)));
    let roughness = format!("Rz {}", sheet.units.text(Measure::Roughness, ring.roughness.value));
    rows.push(Input::new(format!("{key}.roughness"), roughness).from(&ring.roughness.source));
    rows
}

fn fits(sheet: Sheet) -> Vec<Input> {
    let joint = &sheet.findings.joint;
    let mut rows = Vec::new();
    for (index, fit) in joint.fits.iter().enumerate() {
        let key = if joint.fits.len() == 1 { "fit".to_owned() } else { format!("fits.{index}") };
        let size = |deviation: f64| sheet.units.text(Measure::Limit, fit.limits.nominal + deviation);
        let limits = &fit.limits;
        let text = format!(
            "{}: hole {} to {}, shaft {} to {}",
            fit.callout,
            size(limits.hole.lower),
            size(limits.hole.upper),
            size(limits.shaft.lower),
            size(limits.shaft.upper)
        );
        rows.push(Input::new(key, text).from(&fit.source));
    }
    rows
}

fn friction(sheet: Sheet) -> Vec<Input> {
    let friction = &sheet.findings.joint.friction;
    let text = |range: Range| range_text(sheet.units, Measure::Number, range);
    [("holding", &friction.holding), ("pressing", &friction.pressing), ("release", &friction.release)]
        .into_iter()
        .map(|(key, range)| Input::new(format!("friction.{key}"), text(range.value)).from(&range.source))
        .collect()
}

/// The method in words.
pub(super) fn method(method: Method) -> &'static str {
    match method {
        Method::Press => "press",
        Method::HeatHub => "heat hub",
        Method::ChillShaft => "chill shaft",
        Method::HeatAndChill => "heat and chill",
    }
}

fn assembly(sheet: Sheet) -> Vec<Input> {
    let plan = &sheet.findings.joint.assembly;
    let units = sheet.units;
    let temperature = |value: f64| units.text(Measure::Temperature, value);
    let mut rows = vec![
        Input::new("assembly.method", method(plan.method)),
        Input::new("assembly.shop_temperature", temperature(plan.shop_temperature)),
        Input::new("assembly.clearance", units.text(Measure::Deviation, plan.clearance.value))
            .from(&plan.clearance.source),
        Input::new("assembly.chamfer_angle", units.text(Measure::Angle, plan.chamfer_angle.value))
            .from(&plan.chamfer_angle.source),
        Input::new("assembly.bath", bath_name(plan.bath)),
    ];
    if sheet.findings.joint.order.len() > 1 {
        let order: Vec<String> =
            sheet.findings.joint.order.iter().map(|interface| (interface + 1).to_string()).collect();
        rows.push(Input::new("order", format!("fits {}", order.join(", then "))));
    }
    if let Some(limit) = plan.hub_temperature_limit {
        rows.push(Input::new("assembly.hub_temperature_limit", temperature(limit)));
    }
    rows.extend(practice(sheet));
    rows
}

/// Oven, bath, room and handling, as far as the method uses them.
fn practice(sheet: Sheet) -> Vec<Input> {
    let plan = &sheet.findings.joint.assembly;
    let (practice, units) = (&plan.practice, sheet.units);
    let volume = |cubic_metres: f64| format!("{}\u{202f}m³", crate::quantity::number(cubic_metres, 4));
    let time = |seconds: f64| format!("{}\u{202f}s", crate::quantity::number(seconds, 6));
    let mut rows = Vec::new();
    if plan.heats() {
        rows.push(Input::new("assembly.medium", practice.heating.name()));
        if let Some(oven) = practice.oven_temperature {
            rows.push(Input::new("assembly.oven_temperature", units.text(Measure::Temperature, oven)));
        }
    }
    if plan.heats() || plan.chills() {
        let deviation = |metres: f64| units.text(Measure::Deviation, metres);
        rows.push(Input::new("assembly.form_error", deviation(practice.form_error)));
        rows.push(Input::new("assembly.handling_allowance", deviation(practice.handling_allowance)));
        rows.push(Input::new("assembly.transfer_time", time(practice.transfer_time)));
        if let Some(needed) = practice.handling_time {
            rows.push(Input::new("assembly.handling_time", time(needed)));
        }
    }
    if plan.chills() {
        if let Some(length) = practice.chilled_length {
            rows.push(Input::new("assembly.chilled_length", units.text(Measure::Size, length)));
        }
        if let Some(room) = practice.room {
            rows.push(Input::new("assembly.room.volume", volume(room.volume)));
            let changes = crate::quantity::number(room.air_changes, 4);
            rows.push(Input::new("assembly.room.air_changes", changes));
        }
        if let Some(vessel) = practice.vessel {
            rows.push(Input::new("assembly.vessel.volume", volume(vessel.volume)));
            if let Some(loss) = vessel.hourly_loss {
                rows.push(Input::new("assembly.vessel.hourly_loss", volume(loss)));
            }
        }
    }
    if plan.chills() {
        rows.push(Input::new("assembly.humidity", crate::quantity::number(practice.humidity, 4)));
    }
    let lag = crate::quantity::number(practice.temperature_lag, 4);
    rows.push(Input::new("assembly.temperature_lag", lag));
    rows
}

fn smoothing(sheet: Sheet) -> Vec<Input> {
    let joint = &sheet.findings.joint;
    let losses: Vec<String> =
        joint.smoothing.loss.iter().map(|loss| sheet.units.text(Measure::Deviation, *loss)).collect();
    let at = match joint.smoothing.at {
        SmoothingAt::Loosest => "loosest",
        SmoothingAt::Both => "both",
        SmoothingAt::None => "none",
    };
    let criterion = match joint.criterion {
        DuctileCriterion::VonMises => "von Mises",
        DuctileCriterion::Tresca => "Tresca",
    };
    let rule = format!("{} of interference lost: {}", losses.join(" and "), joint.smoothing.rule);
    vec![
        Input::new("smoothing.factor", rule),
        Input::new("smoothing.at", at),
        Input::new("criterion", criterion),
    ]
}

fn requirements(sheet: Sheet) -> Vec<Input> {
    let joint = &sheet.findings.joint;
    let require = &joint.require;
    let brittle =
        |wanted: bool| joint.rings.iter().any(|ring| (ring.material.kind == Kind::Brittle) == wanted);
    let mut rows = vec![Input::new("require.slip_safety", safety_required(require.slip_safety))];
    if brittle(false) {
        rows.push(Input::new("require.yield_safety", safety_required(require.yield_safety)));
    }
    if brittle(true) {
        rows.push(Input::new("require.fracture_safety", safety_required(require.fracture_safety)));
    }
    let allow = match require.allow {
        Allow::Elastic => "elastic".to_owned(),
        Allow::Plastic { share } => format!(
            "plastic, at most {:.0}{THIN}% of the section of the hub, by the {} rule",
            100.0 * share,
            require.yield_rule.name()
        ),
    };
    rows.push(Input::new("require.allow", allow));
    if let Some(force) = require.press_force {
        rows.push(Input::new("require.press_force", sheet.units.text(Measure::Force, force)));
    }
    rows
}
