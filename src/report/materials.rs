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

/// Everything about one material; sources are numbered and stand at the end.
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
        Origin::BuiltIn => "the library built into hubgrip".to_owned(),
        Origin::File(path) => path.display().to_string(),
        Origin::JointFile => "the joint file".to_owned(),
    };
    wrapped(&mut out, "  ", &format!("{}; from {origin}", kind_name(material.kind)));
    out.push('\n');
    let mut values = Values::default();
    values.add("youngs_modulus", Quantity::Pressure, &material.youngs_modulus);
    modulus(&mut values, material);
    values.add("poisson", Quantity::Number, &material.poisson);
    values.add("density", Quantity::Density, &material.density);
    strength(&mut values, material);
    expansion(&mut values, material);
    for (name, kind, found) in [
        ("compressive_strength", Quantity::Pressure, &material.compressive_strength),
        ("long_term_strength", Quantity::Pressure, &material.long_term_strength),
        ("conductivity", Quantity::Conductivity, &material.conductivity),
        ("specific_heat", Quantity::SpecificHeat, &material.specific_heat),
        ("max_temperature", Quantity::Temperature, &material.max_temperature),
    ] {
        if let Some(found) = found {
            values.add(name, kind, found);
        }
    }
    values.write(&mut out);
    for (first, text) in [("  cold: ", &material.low_temperature_caution), ("  note: ", &material.notes)] {
        if let Some(text) = text {
            out.push('\n');
            wrapped(&mut out, first, text);
        }
    }
    out
}

/// Values with the numbers of their sources.
#[derive(Default)]
struct Values {
    lines: Vec<(String, String, usize)>,
    sources: Vec<String>,
}

impl Values {
    fn add(&mut self, name: &str, kind: Quantity, found: &Sourced<f64>) {
        self.line(name.to_owned(), written(kind, found.value), &found.source);
    }

    fn line(&mut self, name: String, value: String, source: &str) {
        let known = self.sources.iter().position(|known| known == source);
        let number = known.unwrap_or_else(|| {
            self.sources.push(source.to_owned());
            self.sources.len() - 1
        });
        self.lines.push((name, value, number + 1));
    }

    fn write(&self, out: &mut String) {
        for (name, value, number) in &self.lines {
            let _ = writeln!(out, "  {name:36} {value:24} [{number}]");
        }
        out.push_str("\n  sources\n");
        for (index, source) in self.sources.iter().enumerate() {
            wrapped(out, &format!("  {:>4} ", format!("[{}]", index + 1)), source);
        }
    }
}

fn strength(values: &mut Values, material: &Material) {
    for row in &material.strength {
        let section = match row.section_up_to {
            Some(limit) => format!(", section to {}", written(Quantity::Length, limit)),
            None => String::new(),
        };
        for (name, strength) in
            [("yield_strength", row.yield_strength), ("tensile_strength", row.tensile_strength)]
        {
            if let Some(strength) = strength {
                values.line(format!("{name}{section}"), written(Quantity::Pressure, strength), &row.source);
            }
        }
    }
}

/// The range of the curve of Young's modulus, and the modulus at the usual temperatures.
fn modulus(values: &mut Values, material: &Material) {
    let Some(curve) = &material.youngs_modulus_curve else { return };
    let (from, to) = curve.range();
    let range = format!("{} to {}", written(Quantity::Temperature, from), written(Quantity::Temperature, to));
    values.line("youngs_modulus_curve".to_owned(), range, &curve.source);
    for (celsius, name) in AT {
        if let Ok(modulus) = material.youngs_modulus_at(celsius + 273.15) {
            let value = format!("{} GPa", number(modulus * 1e-9, 3));
            values.line(format!("  at {name} degC"), value, &curve.source);
        }
    }
}

/// Both baths, then usual temperatures of assembly and service, °C.
const AT: [(f64, &str); 5] =
    [(-196.0, "-196"), (-78.5, "-78.5"), (100.0, "100"), (200.0, "200"), (300.0, "300")];

/// The range of the curve, and mean coefficients at the usual temperatures.
fn expansion(values: &mut Values, material: &Material) {
    let expansion = &material.expansion;
    let (from, to) = expansion.range();
    let range = format!("{} to {}", written(Quantity::Temperature, from), written(Quantity::Temperature, to));
    values.line("expansion".to_owned(), range, &expansion.source);
    for (celsius, name) in AT {
        if let Ok(mean) = expansion.mean_coefficient(celsius + 273.15) {
            let value = format!("{} um/m.K", number(mean * 1e6, 3));
            values.line(format!("  mean from 20 to {name} degC"), value, &expansion.source);
        }
    }
}

fn wrapped(out: &mut String, first: &str, text: &str) {
    let hang = " ".repeat(first.chars().count());
    let options = textwrap::Options::new(WIDTH).initial_indent(first).subsequent_indent(&hang);
    for line in textwrap::wrap(text, options) {
        let _ = writeln!(out, "{}", line.trim_end());
    }
}
