//! Alcohol and acetone, kept cold by dry ice.

use super::cryogen::{Amount, Coolant, DRY_ICE};
use super::error::{AssemblyError, not_negative};
use super::property::Property;
use crate::material::media;

/// A liquid that dry ice keeps cold: it wets the part and chills it faster than ice packed round it. Flammable.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct BathLiquid {
    /// Its name.
    pub name: &'static str,
    /// Temperature to which dry ice brings it, K: the warm end of what is printed.
    pub temperature: f64,
    /// Density at 20 °C, kg/m³.
    pub density: f64,
    /// Mean specific heat from room to bath temperature, J/(kg·K).
    pub specific_heat: f64,
    /// Lowest flash point of the liquids of this name, K.
    pub flash_point: f64,
    /// Where the numbers come from.
    pub source: &'static str,
}

/// Ethanol or isopropanol.
pub const ALCOHOL: BathLiquid = BathLiquid {
    name: "alcohol",
    temperature: media::alcohol_bath::TEMPERATURE.high,
    density: 789.0,
    specific_heat: 2200.0,
    flash_point: media::alcohol_bath::FLASH_POINT.low,
    source: "bath of ethanol -72 °C: D. W. Lee and C. M. Jensen, Journal of Chemical Education 77 (2000) 629 (second-hand); isopropanol \
             -78 °C; density, mean specific heat and flash point of ethanol from memory",
};

/// Acetone.
pub const ACETONE: BathLiquid = BathLiquid {
    name: "acetone",
    temperature: media::alcohol_bath::TEMPERATURE.low,
    density: 791.0,
    specific_heat: 2100.0,
    flash_point: 253.15,
    source: "bath -78 °C: CRC Handbook of Chemistry and Physics, 2005, p. 15-35; density, mean specific heat and flash point -20 °C from \
             memory",
};

impl BathLiquid {
    /// Dry ice that boils off while it works at the temperature of this liquid.
    pub fn coolant(&self) -> Coolant {
        Coolant { temperature: self.temperature, ..DRY_ICE }
    }

    /// Dry ice that brings a volume (m³) of the liquid from `from` (K) down to its bath temperature, with the mass of the
    /// liquid, kg.
    ///
    /// m = V ρ c (T − T_b)/L with the heat of sublimation L; the cold gas bubbles off unused.
    ///
    /// Source: heat balance.
    ///
    /// # Errors
    /// [`AssemblyError::OutsideRange`] for a negative volume or a start that is not above the bath.
    ///
    /// # Example
    /// A litre of alcohol from 20 °C takes about 0.28 kg: 0.789 × 2200 × 92/571 000.
    /// ```
    /// use hubgrip::assembly::bath_liquid::ALCOHOL;
    /// let (liquid, ice) = ALCOHOL.cooled(1e-3, 293.15).unwrap();
    /// assert!((liquid - 0.789).abs() < 1e-12 && (ice.mass - 0.279673).abs() < 1e-5);
    /// ```
    pub fn cooled(&self, volume: f64, from: f64) -> Result<(f64, Amount), AssemblyError> {
        let mass = self.density * not_negative("volume of the liquid (m³)", volume)?;
        let ice = self.coolant().latent_only(mass, &Property::constant(self.specific_heat)?, from)?;
        Ok((mass, ice))
    }
}
