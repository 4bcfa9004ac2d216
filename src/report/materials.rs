//! Materials as text: a list, or one with every number and its source.

use std::fmt::Write;
use std::sync::Arc;

use super::terminal::WIDTH;
use crate::material::{Kind, Material, Origin, Sourced};
use crate::quantity::{Kind as Quantity, number, written};

/// One line a material: id, how it fails, name and condition.
pub fn list(materials: &[Arc<Material>]) -> String {
    let widest = materials.iter().map(|material| material.id.chars().count()).max().unwrap_or(0);
    let mut out = String::new();
    for material in materials {
        let name = match &material.condition {
            Some(condition) => format!("{}, {condition}", material.name),
            None => material.name.clone(),
        };
        let start = format!("{:widest$}  {:8} ", material.id, kind_name(material.kind));
        wrapped(&mut out, &start, &name);
    }
    out
}

/// How a material fails, in a word.
pub fn kind_name(kind: Kind) -> &'static str {
    match kind {
        Kind::Ductile => "ductile",
        Kind::Brittle => "brittle",
        Kind::Polymer => "polymer",
    }
}

/// Everything about one material.
pub fn sheet(material: &Material) -> String {
    let mut out = String::new();
    wrapped(&mut out, "", &format!("{}: {}", material.id, material.name));
    if let Some(condition) = &material.condition {
        wrapped(&mut out, "  ", condition);
    }
    if !material.designations.is_empty() {
        wrapped(&mut out, "  also ", &material.designations.join(", "));
    }
    let origin = match &material.origin {
        Origin::BuiltIn => "built into hubgrip".to_owned(),
        Origin::File(path) => path.display().to_string(),
        Origin::JointFile => "the joint file".to_owned(),
    };
    wrapped(&mut out, "  ", &format!("{}; from {origin}", kind_name(material.kind)));
    out.push('\n');
    value(&mut out, "youngs_modulus", Quantity::Pressure, &material.youngs_modulus);
    value(&mut out, "poisson", Quantity::Number, &material.poisson);
    value(&mut out, "density", Quantity::Density, &material.density);
    for row in &material.strength {
        let section = match row.section_up_to {
            Some(limit) => format!(" to {}", written(Quantity::Length, limit)),
            None => String::new(),
        };
        for (name, strength) in [("yield_strength", row.yield_strength), ("tensile_strength", row.tensile_strength)] {
            if let Some(strength) = strength {
                line(&mut out, &format!("{name}{section}"), &written(Quantity::Pressure, strength), &row.source);
            }
        }
    }
    expansion(&mut out, material);
    for (name, kind, found) in [
        ("conductivity", Quantity::Conductivity, &material.conductivity),
        ("specific_heat", Quantity::SpecificHeat, &material.specific_heat),
        ("max_temperature", Quantity::Temperature, &material.max_temperature),
    ] {
        if let Some(found) = found {
            value(&mut out, name, kind, found);
        }
    }
    for (first, text) in [("  cold: ", &material.low_temperature_caution), ("  note: ", &material.notes)] {
        if let Some(text) = text {
            out.push('\n');
            wrapped(&mut out, first, text);
        }
    }
    out
}

fn expansion(out: &mut String, material: &Material) {
    let expansion = &material.expansion;
    let (from, to) = expansion.range();
    let range = format!("{} to {}", written(Quantity::Temperature, from), written(Quantity::Temperature, to));
    line(out, "expansion", &range, &expansion.source);
    for (celsius, name) in [(-196.0, "-196"), (-78.5, "-78.5"), (100.0, "100"), (200.0, "200"), (300.0, "300")] {
        if let Ok(mean) = expansion.mean_coefficient(celsius + 273.15) {
            let _ = writeln!(out, "    mean from 20 to {name} degC: {} um/m.K", number(mean * 1e6, 3));
        }
    }
}

fn value(out: &mut String, name: &str, kind: Quantity, found: &Sourced<f64>) {
    line(out, name, &written(kind, found.value), &found.source);
}

fn line(out: &mut String, name: &str, value: &str, source: &str) {
    wrapped(out, &format!("  {name:26} {value:14} "), source);
}

fn wrapped(out: &mut String, first: &str, text: &str) {
    let hang = " ".repeat(first.chars().count());
    let options = textwrap::Options::new(WIDTH).initial_indent(first).subsequent_indent(&hang);
    for line in textwrap::wrap(text, options) {
        let _ = writeln!(out, "{}", line.trim_end());
    }
}
