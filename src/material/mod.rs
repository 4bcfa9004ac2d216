//! The material library: strengths, elastic and thermal data with their sources, expansion curves, friction.

use std::path::PathBuf;
use std::sync::Arc;

use crate::numerics::interpolation::{InterpolationError, MonotoneCubic};

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
#[derive(Debug, Clone, Copy, PartialEq, Eq, serde::Serialize, serde::Deserialize)]
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
    /// Largest ruling section for which it holds, m; none: any size.
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
    /// How it fails.
    pub kind: Kind,
    /// Heat treatment or form, such as `normalised`.
    pub condition: Option<String>,
    /// Young's modulus at 20 °C, Pa.
    pub youngs_modulus: Sourced<f64>,
    /// Poisson's ratio.
    pub poisson: Sourced<f64>,
    /// Density, kg/m³.
    pub density: Sourced<f64>,
    /// Thermal expansion from 20 °C.
    pub expansion: Expansion,
    /// Strengths by section, smallest section first; at least one.
    pub strength: Vec<Strength>,
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
    /// Strength for a ruling section `section` (m): the row of the smallest section that holds it.
    ///
    /// None when the section is larger than every row.
    pub fn strength_for(&self, section: f64) -> Option<&Strength> {
        self.strength
            .iter()
            .find(|row| row.section_up_to.is_none_or(|limit| section <= limit * (1.0 + 1e-12)))
    }
}

/// Thermal expansion of a free part from 20 °C as a curve of total strain.
///
/// The argument is temperature in K, the value the strain (L − L₂₀)/L₂₀; it is zero at 293.15 K. It is
/// never extrapolated.
#[derive(Debug, Clone, PartialEq)]
pub struct Expansion {
    curve: MonotoneCubic,
    /// Where the curve comes from.
    pub source: Arc<str>,
    /// True when the curve is a single mean coefficient, not measured points.
    pub is_mean_coefficient: bool,
}

impl Expansion {
    /// A curve through (temperature K, strain) points that pass through zero at 293.15 K.
    ///
    /// # Errors
    /// As [`MonotoneCubic::new`].
    pub fn from_strains(
        points: &[(f64, f64)],
        source: impl Into<Arc<str>>,
    ) -> Result<Self, InterpolationError> {
        Ok(Self { curve: MonotoneCubic::new(points)?, source: source.into(), is_mean_coefficient: false })
    }

    /// One mean coefficient (1/K) for temperatures between `from` and `to` (K).
    ///
    /// # Errors
    /// As [`MonotoneCubic::new`].
    pub fn from_mean(
        coefficient: f64,
        from: f64,
        to: f64,
        source: impl Into<Arc<str>>,
    ) -> Result<Self, InterpolationError> {
        let strain = |t: f64| (t, coefficient * (t - REFERENCE_TEMPERATURE));
        let curve = MonotoneCubic::new(&[strain(from), strain(to)])?;
        Ok(Self { curve, source: source.into(), is_mean_coefficient: true })
    }

    /// Strain of a free part at `temperature` (K), zero at 293.15 K.
    ///
    /// # Errors
    /// Outside the curve's range: nothing is extrapolated.
    pub fn strain(&self, temperature: f64) -> Result<f64, InterpolationError> {
        if temperature == REFERENCE_TEMPERATURE {
            return Ok(0.0);
        }
        self.curve.value(temperature)
    }

    /// Lowest and highest temperature of the curve, K.
    pub fn range(&self) -> (f64, f64) {
        self.curve.range()
    }

    /// Mean coefficient between 20 °C and `temperature` (K), 1/K.
    ///
    /// # Errors
    /// Outside the curve's range. Within 1 K of 20 °C the slope over that kelvin is given.
    pub fn mean_coefficient(&self, temperature: f64) -> Result<f64, InterpolationError> {
        let difference = temperature - REFERENCE_TEMPERATURE;
        if difference.abs() < 1.0 {
            let (low, high) = (REFERENCE_TEMPERATURE - 1.0, REFERENCE_TEMPERATURE + 1.0);
            return Ok((self.curve.value(high)? - self.curve.value(low)?) / 2.0);
        }
        Ok(self.curve.value(temperature)? / difference)
    }

    /// The points of the curve, (K, strain).
    pub fn points(&self) -> &[(f64, f64)] {
        self.curve.points()
    }
}
