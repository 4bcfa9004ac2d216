//! Every material with every value and its source.

use maud::{Markup, html};

use super::Sheet;
use super::table::scrolling;
use crate::joint::Ring;
use crate::material::{Kind, Material, Origin, REFERENCE_TEMPERATURE};
use crate::report::units::Measure;

/// Temperatures at which expansion and modulus are printed, K: both baths, then 100, 200 and 300 °C.
const EXPANSION_AT: [f64; 5] = [77.36, 194.65, 373.15, 473.15, 573.15];

/// A table for each ring; a material that several rings share is printed once.
pub(super) fn body(sheet: Sheet) -> Markup {
    let rings = &sheet.findings.joint.rings;
    html! {
        @for (index, ring) in rings.iter().enumerate() {
            @let first = rings.iter().take(index).all(|earlier| !same(earlier, ring));
            @if first {
                @let names: Vec<&str> = rings.iter().filter(|other| same(other, ring)).map(|other| other.name.as_str()).collect();
                h3 { (ring.material.name) span.quiet { " · " (names.join(", ")) } }
                (scrolling(&ring.material.name, "material", &table(sheet, ring)))
                (remarks(&ring.material))
            }
        }
    }
}

fn same(one: &Ring, other: &Ring) -> bool {
    one.material == other.material && one.strength == other.strength
}

fn table(sheet: Sheet, ring: &Ring) -> Markup {
    let material = &ring.material;
    let units = sheet.units;
    let line = |name: &str, value: String, source: &str| {
        html! { tr { th scope="row" { (name) } td { (value) } td.origin { (source) } } }
    };
    html! {
        thead {
            tr { th scope="col" { "Property" } th scope="col" { "Value" } th scope="col" { "Source" } }
        }
        tbody {
            (line("record", material.id.clone(), &origin(&material.origin)))
            (line("kind", kind(material.kind).to_owned(), ""))
            @if let Some(condition) = &material.condition { (line("condition", condition.clone(), "")) }
            (strength(sheet, ring))
            @if let Some(value) = &material.compressive_strength {
                (line("compressive strength", units.text(Measure::Pressure, value.value), &value.source))
            }
            (line("Young’s modulus", units.text(Measure::Modulus, material.youngs_modulus.value), &material.youngs_modulus.source))
            (modulus(sheet, material))
            (line("Poisson’s ratio", units.text(Measure::Number, material.poisson.value), &material.poisson.source))
            (line("density", units.text(Measure::Density, material.density.value), &material.density.source))
            (expansion(sheet, material))
            @if let Some(value) = &material.conductivity {
                (line("thermal conductivity", units.text(Measure::Conductivity, value.value), &value.source))
            }
            @if let Some(value) = &material.specific_heat {
                (line("specific heat", units.text(Measure::SpecificHeat, value.value), &value.source))
            }
            @if let Some(value) = &material.max_temperature {
                (line("highest temperature for assembly", units.text(Measure::Temperature, value.value), &value.source))
            }
        }
    }
}

fn strength(sheet: Sheet, ring: &Ring) -> Markup {
    let strength = &ring.strength;
    let size = |value: f64| sheet.units.text(Measure::Size, value);
    let section = match strength.section_up_to {
        Some(limit) => format!("ruling section {}, row up to {}", size(ring.section), size(limit)),
        None => format!("ruling section {}, any size", size(ring.section)),
    };
    let rows = [("yield strength", strength.yield_strength), ("tensile strength", strength.tensile_strength)];
    html! {
        @for (name, value) in rows {
            @if let Some(value) = value {
                tr {
                    th scope="row" { (name) }
                    td { (sheet.units.text(Measure::Pressure, value)) span.quiet { " (" (section) ")" } }
                    td.origin { (strength.source) }
                }
            }
        }
    }
}

/// Young's modulus at the temperatures of the expansion; a row that says so when only that of 20 °C is known.
fn modulus(sheet: Sheet, material: &Material) -> Markup {
    let temperature = |value: f64| sheet.units.text(Measure::Temperature, value);
    let Some(curve) = &material.youngs_modulus_curve else {
        return html! {
            tr {
                th scope="row" { "Young’s modulus at temperature" }
                td { "no data: that of " (temperature(REFERENCE_TEMPERATURE)) " is taken" }
                td.origin {}
            }
        };
    };
    let (low, high) = curve.range();
    let values = EXPANSION_AT.iter().filter_map(|at| {
        let modulus = material.youngs_modulus_at(*at).ok()?;
        Some(format!("{} at {}", sheet.units.text(Measure::Modulus, modulus), temperature(*at)))
    });
    let values: Vec<String> = values.collect();
    html! {
        tr {
            th scope="row" { "Young’s modulus at temperature" }
            td {
                (values.join("; "))
                span.quiet { " (curve from " (temperature(low)) " to " (temperature(high)) ")" }
            }
            td.origin { (curve.source) }
        }
    }
}

fn expansion(sheet: Sheet, material: &Material) -> Markup {
    let curve = &material.expansion;
    let temperature = |value: f64| sheet.units.text(Measure::Temperature, value);
    let (low, high) = curve.range();
    let values: Vec<String> = if curve.is_mean_coefficient {
        curve
            .mean_coefficient(REFERENCE_TEMPERATURE)
            .map(|mean| format!("mean {}", sheet.units.text(Measure::Expansion, mean)))
            .into_iter()
            .collect()
    } else {
        EXPANSION_AT
            .iter()
            .filter_map(|at| {
                let mean = curve.mean_coefficient(*at).ok()?;
                Some(format!("{} to {}", sheet.units.text(Measure::Expansion, mean), temperature(*at)))
            })
            .collect()
    };
    html! {
        tr {
            th scope="row" { "expansion, mean from " (temperature(REFERENCE_TEMPERATURE)) }
            td {
                (values.join("; "))
                span.quiet { " (curve from " (temperature(low)) " to " (temperature(high)) ")" }
            }
            td.origin { (curve.source) }
        }
    }
}

fn remarks(material: &Material) -> Markup {
    html! {
        @if let Some(text) = &material.low_temperature_caution { p.small { "When cold: " (text) } }
        @if let Some(text) = &material.notes { p.small { (text) } }
    }
}

fn kind(kind: Kind) -> &'static str {
    match kind {
        Kind::Ductile => "ductile: judged against yield",
        Kind::Brittle => "brittle: greatest principal stress against tensile strength",
        Kind::Polymer => "polymer: judged against its short-term yield; it creeps",
    }
}

fn origin(origin: &Origin) -> String {
    match origin {
        Origin::BuiltIn => "library of the program".to_owned(),
        Origin::File(path) => format!("file {}", path.display()),
        Origin::JointFile => "written in the joint file".to_owned(),
    }
}
