//! A material as written in YAML: a file of the library, or in place in a joint file.
//!
//! Every value is written plain, `210 GPa`, or with its source, `{value: 210 GPa, source: EN 10088-1}`. A
//! plain value has the `source` of the whole record.
//!
//! | key | written | needed |
//! |---|---|---|
//! | `id`, `name`, `designations`, `family`, `condition` | text | no |
//! | `kind` | `ductile`, `brittle` or `polymer` | yes |
//! | `youngs_modulus` | `210 GPa` | yes |
//! | `youngs_modulus_curve` | the name of a shared curve, or a table against temperature: [`ModulusRecord`] | no |
//! | `poisson` | `0.3` | yes |
//! | `density` | `7850 kg/m3` | yes |
//! | `expansion` | `11.5e-6 /K`, the name of a shared curve, or a table: [`ExpansionRecord`] | yes |
//! | `yield_strength`, `tensile_strength` | `355 MPa` | these two or `strength` |
//! | `strength` | rows by ruling section: [`StrengthRecord`] | |
//! | `compressive_strength` | of a brittle material, `840 MPa` | no |
//! | `long_term_strength` | stress that a polymer bears for its life, `12 MPa` | no |
//! | `conductivity`, `specific_heat` | `45 W/m.K`, `480 J/kg.K` | no |
//! | `max_temperature` | highest temperature for assembly, `350 degC` | no |
//! | `low_temperature_caution`, `notes`, `source` | text | no |
//!
//! # Example
//! ```
//! use hubgrip::material::{Origin, record::MaterialRecord};
//! let text = "{kind: ductile, youngs_modulus: 210 GPa, poisson: 0.3, density: 7850 kg/m3, \
//!              expansion: 11.5e-6 /K, yield_strength: 355 MPa, source: demo figures}";
//! let record: MaterialRecord = serde_yaml::from_str(text)?;
//! let material = record.into_material("hub steel", Origin::JointFile)?;
//! assert_eq!(material.id, "hub steel");
//! assert_eq!(material.strength_for(0.05).unwrap().yield_strength, Some(355e6));
//! # Ok::<(), Box<dyn std::error::Error>>(())
//! ```

mod error;
mod expansion;
mod modulus;
mod plausible;
mod strength;
mod value;

use std::sync::Arc;

use schemars::JsonSchema;
use serde::Deserialize;

pub use error::{MaterialError, Step};
pub use expansion::{ExpansionRecord, ExpansionTable, MEAN_FROM, MEAN_TO};
pub use modulus::{ModulusRecord, ModulusTable};
pub use strength::{StrengthRecord, StrengthRow};
pub use value::Value;

use super::{Family, Kind, Material, Origin, REFERENCE_TEMPERATURE, Sourced, Strength};
use crate::quantity::{Conductivity, Density, Modulus, Number, Pressure, SpecificHeat, Temperature};

/// A material as written; see the [module](self) for the keys.
#[derive(Debug, Clone, PartialEq, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct MaterialRecord {
    /// Identifier, such as `C45+N`.
    pub id: Option<String>,
    /// Name as printed; the identifier when it is not given.
    pub name: Option<String>,
    /// Other designations it is found by.
    #[serde(default)]
    pub designations: Vec<String>,
    /// Family, which picks its friction.
    #[serde(default)]
    pub family: Family,
    /// How it fails.
    pub kind: Kind,
    /// Heat treatment or form.
    pub condition: Option<String>,
    /// Young's modulus at 20 °C.
    pub youngs_modulus: Value<Modulus>,
    /// Young's modulus against temperature.
    pub youngs_modulus_curve: Option<ModulusRecord>,
    /// Poisson's ratio.
    pub poisson: Value<Number>,
    /// Density.
    pub density: Value<Density>,
    /// Thermal expansion.
    pub expansion: ExpansionRecord,
    /// Yield strength of any section.
    pub yield_strength: Option<Value<Pressure>>,
    /// Tensile strength of any section.
    pub tensile_strength: Option<Value<Pressure>>,
    /// Strengths by ruling section.
    pub strength: Option<StrengthRecord>,
    /// Compressive strength of a brittle material.
    pub compressive_strength: Option<Value<Pressure>>,
    /// Stress that a polymer bears for its life.
    pub long_term_strength: Option<Value<Pressure>>,
    /// Thermal conductivity at room temperature.
    pub conductivity: Option<Value<Conductivity>>,
    /// Specific heat at room temperature.
    pub specific_heat: Option<Value<SpecificHeat>>,
    /// Highest temperature for assembly.
    pub max_temperature: Option<Value<Temperature>>,
    /// What to mind when the part is chilled.
    pub low_temperature_caution: Option<String>,
    /// What else a user must know.
    pub notes: Option<String>,
    /// Source of every value that has none of its own.
    pub source: Option<String>,
}

impl MaterialRecord {
    /// The material in SI, checked.
    ///
    /// `id_default` is its identifier when the record has none. A value without a source in a record without
    /// one is marked `no source given`.
    ///
    /// # Errors
    /// The first value that no material can have, with the way to it: a modulus or density that is not
    /// positive, a modulus, density or strength that looks like a slip of the unit, a table of the modulus that does
    /// not reach 20 °C, Poisson's ratio outside −1 to 0.5, a yield strength above the tensile strength, sections or
    /// temperatures that do not rise, a strength that is missing for the kind.
    pub fn into_material(self, id_default: &str, origin: Origin) -> Result<Material, MaterialError> {
        plausible::check(&self)?;
        let source: Arc<str> = Arc::from(self.source.as_deref().unwrap_or("no source given"));
        let youngs_modulus = self.youngs_modulus.sourced(&source, |modulus| modulus.0);
        let poisson = self.poisson.sourced(&source, |ratio| ratio.0);
        let density = self.density.sourced(&source, |density| density.0);
        let conductivity = self.conductivity.map(|value| value.sourced(&source, |number| number.0));
        let specific_heat = self.specific_heat.map(|value| value.sourced(&source, |number| number.0));
        let max_temperature = self.max_temperature.map(|value| value.sourced(&source, |kelvin| kelvin.0));
        check_positive("youngs_modulus", Some(&youngs_modulus))?;
        let youngs_modulus_curve = self
            .youngs_modulus_curve
            .map(|record| record.into_curve(Some(youngs_modulus.value), &source))
            .transpose()
            .map_err(|error| error.under("youngs_modulus_curve"))?;
        check_poisson(poisson.value)?;
        check_positive("density", Some(&density))?;
        check_positive("conductivity", conductivity.as_ref())?;
        check_positive("specific_heat", specific_heat.as_ref())?;
        check_max_temperature(max_temperature.as_ref())?;
        let compressive_strength =
            self.compressive_strength.map(|value| value.sourced(&source, |stress| stress.0));
        let long_term_strength =
            self.long_term_strength.map(|value| value.sourced(&source, |stress| stress.0));
        check_only_of(self.kind, Kind::Brittle, "compressive_strength", compressive_strength.as_ref())?;
        check_only_of(self.kind, Kind::Polymer, "long_term_strength", long_term_strength.as_ref())?;
        let expansion = self.expansion.into_expansion(&source).map_err(|error| error.under("expansion"))?;
        let mut strength =
            strengths(self.kind, self.strength, self.yield_strength, self.tensile_strength, &source)?;
        if let Some(limit) = &long_term_strength {
            strength.iter_mut().for_each(|row| limit_to(row, limit));
        }
        let id = self.id.unwrap_or_else(|| id_default.to_owned());
        Ok(Material {
            name: self.name.unwrap_or_else(|| id.clone()),
            id,
            designations: self.designations,
            family: self.family,
            kind: self.kind,
            condition: self.condition,
            youngs_modulus,
            youngs_modulus_curve,
            poisson,
            density,
            expansion,
            strength,
            compressive_strength,
            long_term_strength,
            conductivity,
            specific_heat,
            max_temperature,
            low_temperature_caution: self.low_temperature_caution,
            notes: self.notes,
            origin,
        })
    }
}

fn strengths(
    kind: Kind,
    rows: Option<StrengthRecord>,
    yield_strength: Option<Value<Pressure>>,
    tensile_strength: Option<Value<Pressure>>,
    source: &Arc<str>,
) -> Result<Vec<Strength>, MaterialError> {
    match rows {
        Some(_) if yield_strength.is_some() || tensile_strength.is_some() => {
            Err(MaterialError::new("strength is given twice")
                .with_help("give either `strength`, or `yield_strength` and `tensile_strength`")
                .under("strength"))
        }
        Some(rows) => rows.into_rows(kind, source).map_err(|error| error.under("strength")),
        None => strength::single_row(kind, yield_strength, tensile_strength, source),
    }
}

/// Puts the stress borne for life in place of a greater yield strength.
fn limit_to(row: &mut Strength, limit: &Sourced<f64>) {
    if row.yield_strength.is_some_and(|strength| strength > limit.value) {
        row.yield_strength = Some(limit.value);
        row.source = Arc::from(format!("stress borne for life: {}", limit.source));
    }
}

/// A value that materials of one kind have, and that is positive.
fn check_only_of(
    kind: Kind,
    due: Kind,
    key: &str,
    value: Option<&Sourced<f64>>,
) -> Result<(), MaterialError> {
    let Some(value) = value else { return Ok(()) };
    if kind != due {
        let name = format!("{due:?}").to_lowercase();
        return Err(MaterialError::new(format!("{key} is of a {name} material")).under(key));
    }
    check_positive(key, Some(value))
}

fn check_positive(key: &str, value: Option<&Sourced<f64>>) -> Result<(), MaterialError> {
    match value {
        Some(sourced) if sourced.value <= 0.0 => {
            Err(MaterialError::new(format!("{key} must be greater than zero")).under(key))
        }
        _ => Ok(()),
    }
}

fn check_poisson(ratio: f64) -> Result<(), MaterialError> {
    if ratio > -1.0 && ratio < 0.5 {
        return Ok(());
    }
    Err(MaterialError::new(format!("Poisson's ratio must lie between -1 and 0.5, not {ratio}"))
        .with_help("metals have 0.25 to 0.35")
        .under("poisson"))
}

fn check_max_temperature(limit: Option<&Sourced<f64>>) -> Result<(), MaterialError> {
    match limit {
        Some(limit) if limit.value <= REFERENCE_TEMPERATURE => {
            Err(MaterialError::new("max_temperature must be above 20 degC").under("max_temperature"))
        }
        _ => Ok(()),
    }
}
