//! Cold baths, ovens and oil baths: temperatures, latent heats and film coefficients, each with its source.
//!
//! Film coefficients are for lumped estimates; where a correlation or a range is the source, the value is a
//! judgement inside it and the ends are given.

/// A constant with the range in which published values lie.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Constant {
    /// Value to use, SI.
    pub value: f64,
    /// Least published or usual value, SI.
    pub low: f64,
    /// Greatest published or usual value, SI.
    pub high: f64,
    /// Where it comes from.
    pub source: &'static str,
}

const fn exact(value: f64, source: &'static str) -> Constant {
    Constant { value, low: value, high: value, source }
}

const fn within(low: f64, value: f64, high: f64, source: &'static str) -> Constant {
    Constant { value, low, high, source }
}

/// Celsius zero, K.
const ZERO: f64 = 273.15;

const TEXTBOOK: &str = "ranges of convection coefficients, companion of a heat-transfer textbook";
const BOILING: &str =
    "computed: Berenson film boiling, Zuber and Berenson fluxes with nitrogen properties from memory";
const TRADE: &str = "from memory";

/// Solid carbon dioxide at 1 atm.
pub mod dry_ice {
    use super::{Constant, exact, within};

    /// Sublimation temperature, K: −78.5 °C.
    pub const TEMPERATURE: Constant =
        exact(194.65, "general encyclopaedia and a laboratory bath table: -78.5 °C at 1 atm");
    /// Heat of sublimation, J/kg.
    pub const SUBLIMATION_HEAT: Constant =
        within(571e3, 571e3, 574e3, "dry-ice property texts, 571 to 574 kJ/kg at -78.5 °C");
    /// Density of the solid, kg/m³.
    pub const DENSITY: Constant = within(1550.0, 1600.0, 1700.0, "general encyclopaedia, 1.55 to 1.7 g/cm³");
    /// Gas released at room conditions, m³/kg.
    pub const GAS_VOLUME: Constant =
        within(0.5, 0.54, 0.54, "university safety page: 10 kg give 5.4 m³; a supplier has 0.5 m³/kg");
    /// Density of the gas over that of air.
    pub const GAS_OVER_AIR: Constant = exact(1.5, "safety page of a dry-ice supplier");
    /// Film coefficient of a part packed in dry ice, W/(m²·K).
    pub const FILM_COEFFICIENT: Constant = within(10.0, 20.0, 50.0, super::TRADE);
}

/// A bath of alcohol or acetone with dry ice in it. Flammable.
pub mod alcohol_bath {
    use super::{Constant, within};

    /// Bath temperature, K: −78 °C; ethanol −72 to −78 °C.
    pub const TEMPERATURE: Constant = within(
        195.15,
        195.15,
        201.15,
        "acetone, CRC Handbook of Chemistry and Physics, 2005, p. 15-35; ethanol -72 °C after Lee and Jensen",
    );
    /// Film coefficient, stirred by the gas, W/(m²·K).
    pub const FILM_COEFFICIENT: Constant = within(100.0, 200.0, 400.0, super::TRADE);
    /// Flash point of ethanol and isopropanol, K.
    pub const FLASH_POINT: Constant =
        within(super::ZERO + 12.0, super::ZERO + 12.0, super::ZERO + 17.0, super::TRADE);
}

/// Nitrogen boiling at 1 atm.
pub mod liquid_nitrogen {
    use super::{BOILING, Constant, exact, within};

    /// Boiling temperature, K: −195.79 °C.
    pub const TEMPERATURE: Constant =
        exact(77.36, "normal boiling point, reference text on nitrogen; a supplier prints -196 °C");
    /// Latent heat, J/kg.
    pub const LATENT_HEAT: Constant = within(
        199.0e3,
        199.2e3,
        201.0e3,
        "reference text on nitrogen, quoting NIST (second-hand); 199 and 201 kJ/kg are printed",
    );
    /// Density of the liquid, kg/m³.
    pub const DENSITY: Constant =
        within(806.0, 808.0, 808.29, "nitrogen page of a gas supplier; 806 to 808 in property tables");
    /// Specific heat of the gas from 77 to 300 K, J/(kg·K).
    pub const GAS_SPECIFIC_HEAT: Constant = exact(1040.0, "saturation properties of nitrogen (from memory)");
    /// Density of the gas at 20 °C and 1 atm, kg/m³.
    pub const GAS_DENSITY: Constant = exact(1.165, "properties of nitrogen (from memory)");
    /// Volume of gas at room temperature over volume of liquid.
    pub const GAS_RATIO: Constant = within(
        683.0,
        694.0,
        700.0,
        "computed, 808/1.165 at 20 °C; a supplier has 696, a safety policy 700, 683 at 15 °C (from memory)",
    );
    /// Film coefficient averaged over a cool-down from 20 to −190 °C, W/(m²·K).
    pub const FILM_COEFFICIENT: Constant = within(120.0, 150.0, 250.0, BOILING);
    /// Film coefficient while a vapour film covers the part, W/(m²·K).
    pub const FILM_BOILING_COEFFICIENT: Constant = within(100.0, 130.0, 200.0, BOILING);
    /// Least heat flux of film boiling, W/m².
    pub const LEAST_FILM_FLUX: Constant = within(0.5e4, 0.84e4, 1.0e4, BOILING);
    /// Greatest heat flux of nucleate boiling, W/m².
    pub const PEAK_FLUX: Constant = within(12.0e4, 16.2e4, 20.0e4, BOILING);
    /// Excess of the wall over the bath at which the vapour film collapses, K.
    pub const COLLAPSE_SUPERHEAT: Constant = within(
        25.0,
        32.0,
        50.0,
        "E. G. Brentari, P. J. Giarratano, R. V. Smith, NBS Technical Note 317, 1965 (from memory)",
    );
    /// Surface tension, N/m.
    pub const SURFACE_TENSION: Constant =
        exact(8.87e-3, "saturation properties of nitrogen at 77.36 K (from memory)");
    /// Liquid that is used over what the latent heat alone needs, open box, first fill.
    pub const PRACTICAL_ALLOWANCE: Constant = within(1.2, 1.5, 2.0, super::TRADE);
}

/// A mechanical freezer.
pub mod freezer {
    use super::{Constant, TEXTBOOK, TRADE, ZERO, within};

    /// Temperature, K: chest freezer −18 to −40 °C, ultra-low −70 to −86 °C.
    pub const TEMPERATURE: Constant = within(ZERO - 86.0, ZERO - 80.0, ZERO - 18.0, TRADE);
    /// Film coefficient of still or fan-blown cold air, W/(m²·K).
    pub const FILM_COEFFICIENT: Constant = within(5.0, 8.0, 15.0, TEXTBOOK);
}

/// Cold nitrogen vapour blown over the part.
pub mod cold_gas {
    use super::{Constant, TEXTBOOK, within};

    /// Film coefficient, W/(m²·K).
    pub const FILM_COEFFICIENT: Constant = within(15.0, 30.0, 80.0, TEXTBOOK);
}

/// Still room air.
pub mod still_air {
    use super::{Constant, TEXTBOOK, within};

    /// Film coefficient of a hot part, convection alone, W/(m²·K).
    pub const FILM_COEFFICIENT: Constant = within(2.0, 8.0, 25.0, TEXTBOOK);
    /// Film coefficient of a cold part that is frosting, W/(m²·K).
    pub const FROSTING_COEFFICIENT: Constant = within(5.0, 10.0, 25.0, TEXTBOOK);
}

/// An oven with forced air.
pub mod oven {
    use super::{Constant, TEXTBOOK, within};

    /// Film coefficient, convection alone, W/(m²·K).
    pub const FILM_COEFFICIENT: Constant = within(25.0, 40.0, 100.0, TEXTBOOK);
    /// What radiation adds at 250 °C on oxidised steel, W/(m²·K): 4 ε σ T³ with ε = 0.8, T = 450 K.
    pub const RADIATION: Constant = within(8.0, 16.0, 25.0, "computed: 4 ε σ T³, ε = 0.8, T = 450 K");
}

/// A bath of mineral oil.
pub mod oil_bath {
    use super::{Constant, TRADE, ZERO, exact, within};

    /// Film coefficient at 100 to 150 °C, W/(m²·K).
    pub const FILM_COEFFICIENT: Constant = within(50.0, 150.0, 300.0, TRADE);
    /// Flash point, K: 188 to 222 °C.
    pub const FLASH_POINT: Constant =
        within(ZERO + 188.0, ZERO + 188.0, ZERO + 222.0, "lubricant technical notes, ISO VG 32 turbine oils");
    /// How far below the flash point the bath is kept, K.
    pub const FLASH_POINT_MARGIN: Constant = exact(50.0, TRADE);
    /// Highest bath temperature for rolling bearings, K: 120 °C.
    pub const LIMIT_FOR_BEARINGS: Constant = exact(ZERO + 120.0, "guide to heating bearings (bearing trade)");
}

/// An induction heater.
pub mod induction {
    use super::{Constant, TRADE, ZERO, within};

    /// Usual temperature of a part for shrink-fitting, K: 150 to 300 °C.
    pub const TEMPERATURE: Constant =
        within(ZERO + 150.0, ZERO + 200.0, ZERO + 300.0, "general encyclopaedia, induction shrink fitting");
    /// Power at the surface, W/m².
    pub const SURFACE_POWER: Constant = within(2.0e4, 10.0e4, 20.0e4, TRADE);
    /// Share of the power that reaches the part.
    pub const EFFICIENCY: Constant = within(0.5, 0.7, 0.85, TRADE);
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn baths_stand_where_the_tables_have_them() {
        // −78.5 °C and 77.36 K, as in the sources of the two constants.
        assert!((dry_ice::TEMPERATURE.value - ZERO + 78.5).abs() < 1e-9);
        assert!((liquid_nitrogen::TEMPERATURE.value - ZERO + 195.79).abs() < 1e-9);
    }

    #[test]
    fn the_gas_ratio_of_nitrogen_is_that_of_the_densities() {
        let ratio = liquid_nitrogen::DENSITY.value / liquid_nitrogen::GAS_DENSITY.value;
        assert!((ratio - liquid_nitrogen::GAS_RATIO.value).abs() < 0.5, "{ratio}");
    }

    #[test]
    fn carbon_dioxide_is_as_heavy_as_its_molar_mass_says() {
        // Ideal gas at 20 °C and 101.325 kPa: M/(R T) p with M = 44.01 g/mol gives 1.83 kg/m³, 0.546 m³/kg.
        let volume = 8.314_462_618 * 293.15 / (101_325.0 * 0.044_01);
        assert!((volume - dry_ice::GAS_VOLUME.value).abs() < 0.01, "{volume}");
    }

    #[test]
    fn radiation_is_four_epsilon_sigma_t_cubed() {
        let linear = 4.0 * 0.8 * 5.670_374_419e-8 * 450.0_f64.powi(3);
        assert!((linear - oven::RADIATION.value).abs() < 1.0, "{linear}");
    }

    #[test]
    fn every_value_lies_in_its_range() {
        for constant in [
            dry_ice::TEMPERATURE,
            dry_ice::SUBLIMATION_HEAT,
            dry_ice::DENSITY,
            dry_ice::GAS_VOLUME,
            dry_ice::FILM_COEFFICIENT,
            alcohol_bath::TEMPERATURE,
            alcohol_bath::FILM_COEFFICIENT,
            alcohol_bath::FLASH_POINT,
            liquid_nitrogen::LATENT_HEAT,
            liquid_nitrogen::DENSITY,
            liquid_nitrogen::GAS_RATIO,
            liquid_nitrogen::FILM_COEFFICIENT,
            liquid_nitrogen::FILM_BOILING_COEFFICIENT,
            liquid_nitrogen::LEAST_FILM_FLUX,
            liquid_nitrogen::PEAK_FLUX,
            liquid_nitrogen::COLLAPSE_SUPERHEAT,
            liquid_nitrogen::PRACTICAL_ALLOWANCE,
            freezer::TEMPERATURE,
            freezer::FILM_COEFFICIENT,
            cold_gas::FILM_COEFFICIENT,
            still_air::FILM_COEFFICIENT,
            still_air::FROSTING_COEFFICIENT,
            oven::FILM_COEFFICIENT,
            oven::RADIATION,
            oil_bath::FILM_COEFFICIENT,
            oil_bath::FLASH_POINT,
            induction::TEMPERATURE,
            induction::SURFACE_POWER,
            induction::EFFICIENCY,
        ] {
            assert!(constant.low <= constant.value && constant.value <= constant.high, "{constant:?}");
            assert!(constant.low > 0.0 && !constant.source.is_empty(), "{constant:?}");
        }
    }
}
