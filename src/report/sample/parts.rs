//! Materials, parts and the short description a sample is made from.

use std::sync::Arc;

use crate::joint::Method;
use crate::material::{Expansion, Kind, Material, Origin, Sourced, Strength};
use crate::quantity::UnitSystem;

/// One ring: sizes in mm, roughness in µm.
pub(crate) struct Part {
    pub name: &'static str,
    pub material: Material,
    /// Inner diameter of the innermost ring; the others take the ring inside.
    pub inner: Option<f64>,
    pub outer: f64,
    pub roughness: f64,
}

impl Part {
    pub fn new(name: &'static str, material: Material, outer: f64, roughness: f64) -> Self {
        Self { name, material, inner: None, outer, roughness }
    }

    pub fn solid(name: &'static str, material: Material, outer: f64, roughness: f64) -> Self {
        Self { inner: Some(0.0), ..Self::new(name, material, outer, roughness) }
    }
}

/// A sample in short: mm, µm, N, N·m.
pub(crate) struct Spec {
    pub title: &'static str,
    pub parts: Vec<Part>,
    /// Callout with hole lower, hole upper, shaft lower, shaft upper.
    pub fits: Vec<(&'static str, [f64; 4])>,
    pub length: f64,
    pub relief: f64,
    pub torque: f64,
    pub axial_force: f64,
    pub method: Method,
    pub display: UnitSystem,
}

impl Default for Spec {
    fn default() -> Self {
        Self {
            title: "",
            parts: Vec::new(),
            fits: Vec::new(),
            length: 50.0,
            relief: 0.0,
            torque: 0.0,
            axial_force: 0.0,
            method: Method::Press,
            display: UnitSystem::Metric,
        }
    }
}

struct Data {
    id: &'static str,
    name: &'static str,
    kind: Kind,
    youngs_modulus: f64,
    poisson: f64,
    density: f64,
    /// Mean coefficients from −196 °C, from −78 °C and to 300 °C, 10⁻⁶/K.
    expansion: [f64; 3],
    yield_strength: Option<f64>,
    tensile_strength: f64,
    max_temperature: f64,
    low_temperature_caution: Option<&'static str>,
}

impl Data {
    fn material(self) -> Material {
        let source: Arc<str> = "made up for this test".into();
        let sourced = |value| Sourced::new(value, source.clone());
        let [nitrogen, dry_ice, hot] = self.expansion.map(|mean| mean * 1e-6);
        let strain = |t: f64, mean: f64| (t, mean * (t - 293.15));
        Material {
            id: self.id.into(),
            name: self.name.into(),
            designations: vec![],
            kind: self.kind,
            condition: None,
            youngs_modulus: sourced(self.youngs_modulus),
            poisson: sourced(self.poisson),
            density: sourced(self.density),
            expansion: Expansion::from_strains(
                &[
                    strain(77.36, nitrogen),
                    strain(194.65, dry_ice),
                    (293.15, 0.0),
                    strain(373.15, 0.97 * hot),
                    strain(773.15, hot),
                ],
                source.clone(),
            )
            .unwrap(),
            strength: vec![Strength {
                section_up_to: Some(0.1),
                yield_strength: self.yield_strength,
                tensile_strength: Some(self.tensile_strength),
                source: source.clone(),
            }],
            conductivity: Some(sourced(48.0)),
            specific_heat: Some(sourced(470.0)),
            max_temperature: Some(sourced(self.max_temperature)),
            low_temperature_caution: self.low_temperature_caution.map(str::to_owned),
            notes: None,
            origin: Origin::BuiltIn,
        }
    }
}

/// Normalised carbon steel.
pub(crate) fn c45() -> Material {
    Data {
        id: "C45+N",
        name: "C45 steel, normalised",
        kind: Kind::Ductile,
        youngs_modulus: 210e9,
        poisson: 0.29,
        density: 7850.0,
        expansion: [9.0, 10.9, 12.8],
        yield_strength: Some(305e6),
        tensile_strength: 580e6,
        max_temperature: 623.15,
        low_temperature_caution: Some(
            "Ferritic steel is notch-brittle when cold: no blows, no straightening.",
        ),
    }
    .material()
}

/// Quenched and tempered steel.
pub(crate) fn quenched() -> Material {
    Data {
        id: "42CrMo4+QT",
        name: "42CrMo4 steel, quenched and tempered",
        kind: Kind::Ductile,
        youngs_modulus: 210e9,
        poisson: 0.3,
        density: 7850.0,
        expansion: [9.0, 10.9, 12.8],
        yield_strength: Some(650e6),
        tensile_strength: 900e6,
        max_temperature: 573.15,
        low_temperature_caution: None,
    }
    .material()
}

/// Grey iron.
pub(crate) fn grey_iron() -> Material {
    Data {
        id: "EN-GJL-250",
        name: "grey iron EN-GJL-250",
        kind: Kind::Brittle,
        youngs_modulus: 110e9,
        poisson: 0.26,
        density: 7200.0,
        expansion: [8.6, 10.0, 11.7],
        yield_strength: None,
        tensile_strength: 195e6,
        max_temperature: 523.15,
        low_temperature_caution: None,
    }
    .material()
}

/// Wrought aluminium.
pub(crate) fn aluminium() -> Material {
    Data {
        id: "EN-AW-6082-T6",
        name: "aluminium EN AW-6082-T6",
        kind: Kind::Ductile,
        youngs_modulus: 70e9,
        poisson: 0.33,
        density: 2700.0,
        expansion: [18.0, 21.7, 24.5],
        yield_strength: Some(250e6),
        tensile_strength: 300e6,
        max_temperature: 423.15,
        low_temperature_caution: None,
    }
    .material()
}
