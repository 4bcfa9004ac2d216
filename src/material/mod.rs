//! The material library: strengths, elastic and thermal data with their sources, expansion curves, friction.
//!
//! | module | subject |
//! |---|---|
//! | [`record`] | a material as written in YAML, in a library file or in place in a joint file |
//! | [`yaml`] | reading such a file, with file, line and column of every fault |
//! | [`library`] | the records built in and the user's folders; finding a material by any of its names |
//! | [`curves`] | expansion curves that several materials share |
//! | [`modulus_curves`] | curves of Young's modulus that several materials share |
//! | [`friction`] | coefficients of friction by pair, method and lubrication |
//! | [`roughness`] | usual roughness, Ra and Rz, loss of interference by smoothing |
//! | [`media`] | cold baths, ovens, oil baths: temperatures and film coefficients |

pub mod curves;
pub mod friction;
pub mod library;
pub mod media;
pub mod modulus_curves;
pub mod record;
pub mod roughness;
pub mod yaml;

mod catalogue;
mod expansion;
mod family;
mod modulus;

use std::path::PathBuf;
use std::sync::Arc;

use crate::numerics::interpolation::InterpolationError;

pub use expansion::Expansion;
pub use family::Family;
pub use modulus::ModulusCurve;

/// Reference temperature of sizes: 20 °C (ISO 1:2022, clause 4).
pub const REFERENCE_TEMPERATURE: f64 = 293.15;

/// A number with where it comes from.
#[derive(Debug, Clone, PartialEq)]
pub struct Sourced<T> {
    /// The value, SI.
    pub value: T,
    /// Title, table or clause; or "common practice, no source"; or "from memory".
    pub source: Arc<str>,
}

impl<T> Sourced<T> {
    /// A value with its source.
    pub fn new(value: T, source: impl Into<Arc<str>>) -> Self {
        Self { value, source: source.into() }
    }
}

/// A range with its two ends, SI.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Range {
    /// Least value.
    pub low: f64,
    /// Greatest value; not below the least.
    pub high: f64,
}

/// How a material fails, which picks its strength criterion.
#[derive(Debug, Clone, Copy, PartialEq, Eq, serde::Serialize, serde::Deserialize, schemars::JsonSchema)]
#[serde(rename_all = "lowercase")]
pub enum Kind {
    /// Yields before it breaks: von Mises or Tresca against yield strength.
    Ductile,
    /// Breaks without yielding: greatest principal stress against tensile strength.
    Brittle,
    /// Creeps: treated as ductile on its short-term yield strength, with a caution.
    Polymer,
}

/// Strength of a section, SI.
#[derive(Debug, Clone, PartialEq)]
pub struct Strength {
    /// Largest ruling section for which it holds, m (for castings the wall thickness); none: any size.
    pub section_up_to: Option<f64>,
    /// Yield strength (Re or Rp0.2), Pa; none for brittle materials.
    pub yield_strength: Option<f64>,
    /// Tensile strength, Pa.
    pub tensile_strength: Option<f64>,
    /// Where the two come from.
    pub source: Arc<str>,
}

/// One material, SI.
#[derive(Debug, Clone, PartialEq)]
pub struct Material {
    /// Identifier, such as `C45+N`.
    pub id: String,
    /// Name as printed.
    pub name: String,
    /// Other designations it is found by.
    pub designations: Vec<String>,
    /// What family it belongs to, which picks its friction.
    pub family: Family,
    /// How it fails.
    pub kind: Kind,
    /// Heat treatment or form, such as `normalised`.
    pub condition: Option<String>,
    /// Young's modulus at 20 °C, Pa.
    pub youngs_modulus: Sourced<f64>,
    /// Young's modulus against temperature, as its ratio to that at 20 °C; none when there are no data.
    pub youngs_modulus_curve: Option<ModulusCurve>,
    /// Poisson's ratio.
    pub poisson: Sourced<f64>,
    /// Density, kg/m³.
    pub density: Sourced<f64>,
    /// Thermal expansion from 20 °C.
    pub expansion: Expansion,
    /// Strengths by section, smallest section first; at least one.
    pub strength: Vec<Strength>,
    /// Compressive strength of a brittle material, Pa.
    pub compressive_strength: Option<Sourced<f64>>,
    /// Stress that a polymer bears for its life, Pa; where it is known, it stands in the rows of `strength` in place of
    /// a greater yield strength.
    pub long_term_strength: Option<Sourced<f64>>,
    /// Thermal conductivity at room temperature, W/(m·K).
    pub conductivity: Option<Sourced<f64>>,
    /// Specific heat at room temperature, J/(kg·K).
    pub specific_heat: Option<Sourced<f64>>,
    /// Highest temperature for assembly, K.
    pub max_temperature: Option<Sourced<f64>>,
    /// What to mind when the part is chilled.
    pub low_temperature_caution: Option<String>,
    /// What else a user must know.
    pub notes: Option<String>,
    /// Where the record comes from.
    pub origin: Origin,
}

/// Where a material record was read.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum Origin {
    /// The library built into the program.
    BuiltIn,
    /// A file in a user's folder.
    File(PathBuf),
    /// Written in the joint file.
    JointFile,
}

impl Material {
    /// Young's modulus at a temperature (K), Pa; a material without a curve keeps that of 20 °C.
    ///
    /// # Errors
    /// Outside the curve's range: nothing is extrapolated.
    ///
    /// # Example
    /// ```
    /// use hubgrip::material::library::Library;
    /// let library = Library::built_in();
    /// let (steel, iron) = (library.find("S355J2")?, library.find("GG25")?);
    /// assert!((steel.youngs_modulus_at(473.15).unwrap() / 1e9 - 199.0).abs() < 1.0);
    /// assert_eq!(iron.youngs_modulus_at(473.15), Ok(iron.youngs_modulus.value));
    /// # Ok::<(), hubgrip::material::library::NotFound>(())
    /// ```
    pub fn youngs_modulus_at(&self, temperature: f64) -> Result<f64, InterpolationError> {
        let at_20 = self.youngs_modulus.value;
        self.youngs_modulus_curve.as_ref().map_or(Ok(at_20), |curve| Ok(at_20 * curve.ratio(temperature)?))
    }

    /// Lowest and highest temperature for which both expansion and modulus are known, K.
    pub fn temperature_range(&self) -> (f64, f64) {
        let (from, to) = self.expansion.range();
        match self.youngs_modulus_curve.as_ref().map(ModulusCurve::range) {
            Some((low, high)) => (from.max(low), to.min(high)),
            None => (from, to),
        }
    }

    /// Strength for a ruling section `section` (m): the row of the smallest section that holds it.
    ///
    /// None when the section is larger than every row.
    pub fn strength_for(&self, section: f64) -> Option<&Strength> {
        self.strength
            .iter()
            .find(|row| row.section_up_to.is_none_or(|limit| section <= limit * (1.0 + 1e-12)))
    }
}
