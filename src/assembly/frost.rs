//! Frost on a cold part that is carried through moist air: how fast it grows, what heat it brings.
//!
//! Everything here is a bound from above: the seat stands in the open, the frost is as light as fresh frost can be.

use super::air::air_conductivity;
use super::error::{AssemblyError, not_negative, positive, require};
use crate::material::Range;

/// Density of fresh frost, kg/m³: 50 to 200 (texts on refrigeration, from memory; the thickest frost is the lightest).
pub const FROST_DENSITY: Range = Range { low: 50.0, high: 200.0 };
/// Heat of sublimation of ice near 0 °C, J/kg (steam tables, IAPWS; from memory).
pub const SUBLIMATION_HEAT: f64 = 2.834e6;
/// Specific heat of ice at 0 °C, J/(kg·K) (from memory); it falls in the cold.
pub const ICE_SPECIFIC_HEAT: f64 = 2100.0;
/// Pace at which a part is carried, m/s: a walk (common practice, no source).
pub const PACE: f64 = 1.0;
/// Gas constant of water vapour, J/(kg·K): 8.314462618/0.01801528.
pub const VAPOUR_GAS_CONSTANT: f64 = 461.523;
/// Freezing point of water, K.
const FREEZING: f64 = 273.15;

/// Vapour pressure over ice, Pa.
///
/// ln p = 9.550426 − 5723.265/T + 3.53068 ln T − 0.00728332 T
///
/// Valid from 110 K to 273.16 K; colder ice is taken to have none, which it has to a part in 10¹².
///
/// Source: D. M. Murphy and T. Koop, *Review of the vapour pressures of ice and supercooled water for atmospheric
/// applications*, Quarterly Journal of the Royal Meteorological Society 131 (2005) 1539, equation 7 (from memory; it gives
/// the triple point, 611.66 Pa at 273.16 K).
///
/// # Errors
/// [`AssemblyError::OutsideRange`] above the triple point.
///
/// # Example
/// ```
/// use hubgrip::assembly::frost::vapour_over_ice;
/// assert!((vapour_over_ice(273.16).unwrap() - 611.657).abs() < 0.01);
/// ```
pub fn vapour_over_ice(temperature: f64) -> Result<f64, AssemblyError> {
    require(
        temperature <= 273.16,
        "temperature of the ice (K)",
        temperature,
        "at most 273.16, the triple point",
    )?;
    positive("temperature of the ice (K)", temperature)?;
    if temperature < 110.0 {
        return Ok(0.0);
    }
    let t = temperature;
    Ok((9.550_426 - 5_723.265 / t + 3.530_68 * t.ln() - 0.007_283_32 * t).exp())
}

/// Vapour pressure over liquid water, Pa.
///
/// ln p = 54.842763 − 6763.22/T − 4.21 ln T + 0.000367 T + tanh(0.0415 (T − 218.8)) (53.878 − 1331.22/T − 9.44523 ln T +
/// 0.014025 T), from 123 K to 332 K.
///
/// Source: Murphy and Koop as for [`vapour_over_ice`], equation 10 (from memory).
///
/// # Errors
/// [`AssemblyError::OutsideRange`] outside that range.
///
/// # Example
/// ```
/// use hubgrip::assembly::frost::vapour_over_water;
/// assert!((vapour_over_water(293.15).unwrap() - 2339.0).abs() < 2.0);
/// ```
pub fn vapour_over_water(temperature: f64) -> Result<f64, AssemblyError> {
    let t = require(
        (123.0..=332.0).contains(&temperature),
        "temperature of the air (K)",
        temperature,
        "between 123 and 332 for the vapour pressure of water",
    )?;
    let ln = t.ln();
    let cold = (0.0415 * (t - 218.8)).tanh();
    Ok((54.842_763 - 6_763.22 / t - 4.21 * ln
        + 0.000_367 * t
        + cold * (53.878 - 1_331.22 / t - 9.445_23 * ln + 0.014_025 * t))
        .exp())
}

/// Density of water vapour, kg/m³: p/(R_v T).
///
/// Source: law of ideal gases.
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// ```
/// let density = hubgrip::assembly::frost::vapour_density(1169.6, 293.15).unwrap();
/// assert!((density - 8.645e-3).abs() < 1e-5);
/// ```
pub fn vapour_density(pressure: f64, temperature: f64) -> Result<f64, AssemblyError> {
    not_negative("vapour pressure (Pa)", pressure)?;
    positive("temperature (K)", temperature)?;
    Ok(pressure / (VAPOUR_GAS_CONSTANT * temperature))
}

/// Dry air at 1 atm.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Air {
    /// Temperature at which it is taken, K.
    pub temperature: f64,
    /// Density, kg/m³.
    pub density: f64,
    /// Specific heat, J/(kg·K).
    pub specific_heat: f64,
    /// Kinematic viscosity, m²/s.
    pub viscosity: f64,
    /// Conductivity, W/(m·K).
    pub conductivity: f64,
    /// Thermal diffusivity, m²/s.
    pub diffusivity: f64,
    /// Prandtl number.
    pub prandtl: f64,
}

/// F. P. Incropera and D. P. DeWitt, *Fundamentals of Heat and Mass Transfer*, table A.4: T (K), ρ, c_p, ν, α, Pr; the conductivity is that
/// of [`air_conductivity`].
const TABLE: [[f64; 6]; 5] = [
    [150.0, 2.3364, 1012.0, 4.426e-6, 5.84e-6, 0.758],
    [200.0, 1.7458, 1007.0, 7.590e-6, 10.3e-6, 0.737],
    [250.0, 1.3947, 1006.0, 11.44e-6, 15.9e-6, 0.720],
    [300.0, 1.1614, 1007.0, 15.89e-6, 22.5e-6, 0.707],
    [350.0, 0.9950, 1009.0, 20.92e-6, 29.9e-6, 0.700],
];

impl Air {
    /// Air at a film temperature (K), 150 K to 350 K, linear between the rows of the table.
    ///
    /// Source: Incropera and DeWitt, table A.4.
    ///
    /// # Errors
    /// [`AssemblyError::OutsideRange`].
    pub fn at(temperature: f64) -> Result<Self, AssemblyError> {
        require(
            (150.0..=350.0).contains(&temperature),
            "film temperature of the air (K)",
            temperature,
            "between 150 and 350, where its properties are tabulated",
        )?;
        let pair = TABLE.windows(2).find(|pair| temperature <= pair[1][0]).unwrap_or(&TABLE[3..]);
        let share = (temperature - pair[0][0]) / (pair[1][0] - pair[0][0]);
        let of = |column: usize| pair[0][column] + share * (pair[1][column] - pair[0][column]);
        Ok(Self {
            temperature,
            density: of(1),
            specific_heat: of(2),
            viscosity: of(3),
            conductivity: air_conductivity(temperature),
            diffusivity: of(4),
            prandtl: of(5),
        })
    }

    /// Lewis number of water vapour in air, α/D with D = 0.26 cm²/s (T/298 K)^1.5.
    ///
    /// Source: Incropera and DeWitt, table A.8 and its rule for the temperature.
    pub fn lewis(&self) -> f64 {
        self.diffusivity / (0.26e-4 * (self.temperature / 298.0).powf(1.5))
    }
}

/// Film coefficient of a cylinder that is colder than the air and carried through it, W/(m²·K).
///
/// Natural convection Nu_N = (0.60 + 0.387 Ra^⅙/(1 + (0.559/Pr)^(9/16))^(8/27))², carried across its axis at w
/// Nu_F = 0.3 + 0.62 Re^½ Pr^⅓/(1 + (0.4/Pr)^⅔)^¼ (1 + (Re/282 000)^⅝)^⅘, both together Nu³ = Nu_N³ + Nu_F³
///
/// | symbol | meaning | unit | valid |
/// |---|---|---|---|
/// | d | diameter | m | > 0, Ra ≤ 10¹² |
/// | w | pace | m/s | ≥ 0 |
/// | T_s, T | surface and air | K | T_s < T, mean from 150 K to 350 K |
///
/// Properties of air at the mean of both temperatures.
///
/// Source: S. W. Churchill and H. H. S. Chu (1975), S. W. Churchill and M. Bernstein (1977), both as in Incropera and DeWitt,
/// chapters 9 and 7; the sum of cubes from its section on mixed convection.
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// ```
/// let film = hubgrip::assembly::frost::carried_film(0.08, 1.0, 77.36, 293.15).unwrap();
/// assert!((15.0..17.0).contains(&film));
/// ```
pub fn carried_film(diameter: f64, pace: f64, surface: f64, air: f64) -> Result<f64, AssemblyError> {
    const FREE_FALL: f64 = 9.806_65;
    positive("diameter (m)", diameter)?;
    not_negative("pace (m/s)", pace)?;
    positive("air above the surface (K)", air - surface)?;
    let gas = Air::at(0.5 * (surface + air))?;
    let pr = gas.prandtl;
    let rayleigh =
        FREE_FALL * (air - surface) * diameter.powi(3) / (gas.temperature * gas.viscosity * gas.diffusivity);
    require(rayleigh <= 1e12, "Rayleigh number", rayleigh, "at most 1e12")?;
    let reynolds = pace * diameter / gas.viscosity;
    let natural = (0.60
        + 0.387 * rayleigh.powf(1.0 / 6.0) / (1.0 + (0.559 / pr).powf(9.0 / 16.0)).powf(8.0 / 27.0))
    .powi(2);
    let forced = 0.3
        + 0.62 * reynolds.sqrt() * pr.cbrt() / (1.0 + (0.4 / pr).powf(2.0 / 3.0)).powf(0.25)
            * (1.0 + (reynolds / 282_000.0).powf(0.625)).powf(0.8);
    let nusselt = if pace > 0.0 { (natural.powi(3) + forced.powi(3)).cbrt() } else { natural };
    Ok(nusselt * gas.conductivity / diameter)
}

/// What settles on a cold cylinder.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Deposit {
    /// Temperature of the surface, K.
    pub surface: f64,
    /// Air at the mean of surface and room.
    pub air: Air,
    /// Film coefficient, W/(m²·K).
    pub film: f64,
    /// Density of the vapour at the surface, kg/m³.
    pub vapour_at_surface: f64,
    /// Mass that settles, kg/(m²·s); never negative.
    pub rate: f64,
}

impl Deposit {
    /// Heat that the frost brings to the surface, W/m²: of sublimation, and of ice cooled down to the surface.
    pub fn heat_flux(&self) -> f64 {
        self.rate * (SUBLIMATION_HEAT + ICE_SPECIFIC_HEAT * (FREEZING - self.surface).max(0.0))
    }

    /// Growth on the surface, m/s, from the densest to the lightest frost.
    pub fn growth(&self) -> Range {
        Range { low: self.rate / FROST_DENSITY.high, high: self.rate / FROST_DENSITY.low }
    }
}

/// Frost that settles on a cylinder carried through moist air.
///
/// ṁ = h_m (ρ_v − ρ_s),  h_m = h/(ρ c_p Le^⅔)
///
/// | symbol | meaning | unit | valid |
/// |---|---|---|---|
/// | h | film coefficient of [`carried_film`] | W/(m²·K) | |
/// | ρ, c_p, Le | density and specific heat of air, Lewis number of vapour in it | kg/m³, J/(kg·K), – | at film temperature |
/// | ρ_v, ρ_s | density of the vapour in the room and over ice at the surface | kg/m³ | ρ_v ≪ ρ |
///
/// A cold boundary layer holds less vapour than it lets through: some freezes there to mist and drifts by. That is left out,
/// on the safe side.
///
/// Source: analogy of heat and mass transfer, Incropera and DeWitt, chapter 6 (Lewis relation with the exponent ⅓).
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// ```
/// use hubgrip::assembly::frost::deposit;
/// // A seat of 80 mm at −196 °C in a room at 20 °C with 8.64 g of vapour in a cubic metre.
/// let found = deposit(0.08, 1.0, 77.36, 293.15, 8.64e-3).unwrap();
/// assert!((found.rate - 8.75e-5).abs() < 0.01e-5);
/// ```
pub fn deposit(
    diameter: f64,
    pace: f64,
    surface: f64,
    air: f64,
    vapour: f64,
) -> Result<Deposit, AssemblyError> {
    not_negative("density of the vapour (kg/m³)", vapour)?;
    let film = carried_film(diameter, pace, surface, air)?;
    let gas = Air::at(0.5 * (surface + air))?;
    let at_surface = vapour_density(vapour_over_ice(surface)?, surface)?;
    let mass_coefficient = film / (gas.density * gas.specific_heat * gas.lewis().powf(2.0 / 3.0));
    Ok(Deposit {
        surface,
        air: gas,
        film,
        vapour_at_surface: at_surface,
        rate: mass_coefficient * (vapour - at_surface).max(0.0),
    })
}

/// The greatest deposit while a surface warms from `coldest` to `warmest` (K, at most the freezing point).
///
/// # Errors
/// As [`deposit`].
pub fn greatest_deposit(
    diameter: f64,
    (coldest, warmest): (f64, f64),
    air: f64,
    vapour: f64,
) -> Result<Deposit, AssemblyError> {
    const STEPS: u32 = 32;
    let to = warmest.min(FREEZING).max(coldest);
    let mut greatest = deposit(diameter, PACE, coldest, air, vapour)?;
    for step in 1..=STEPS {
        let surface = coldest + (to - coldest) * f64::from(step) / f64::from(STEPS);
        let found = deposit(diameter, PACE, surface, air, vapour)?;
        if found.rate > greatest.rate {
            greatest = found;
        }
    }
    Ok(greatest)
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    /// The Magnus formulas of the WMO guide (CIMO, annex 4.B: 6.112 hPa, 17.62, 243.12 °C over water; 22.46, 272.62 °C over
    /// ice; from memory) stay within half a per cent from −40 °C to 40 °C, and within 1 % over ice to −65 °C.
    #[test]
    fn vapour_pressures_agree_with_the_magnus_formulas() {
        let magnus = |celsius: f64, a: f64, b: f64| 611.2 * (a * celsius / (b + celsius)).exp();
        for celsius in [-20, -10, 0, 10, 20, 30, 40].map(f64::from) {
            let water = vapour_over_water(celsius + 273.15).unwrap();
            assert_relative_eq!(water, magnus(celsius, 17.62, 243.12), max_relative = 5e-3);
        }
        for celsius in [-65, -50, -40, -20, -5, 0].map(f64::from) {
            let ice = vapour_over_ice(celsius + 273.15).unwrap();
            assert_relative_eq!(ice, magnus(celsius, 22.46, 272.62), max_relative = 1e-2);
        }
        assert_eq!(vapour_over_ice(77.36).unwrap(), 0.0);
        assert!(vapour_over_ice(280.0).is_err() && vapour_over_water(400.0).is_err());
    }

    /// Ice and water meet at the triple point, 611.657 Pa.
    #[test]
    fn both_meet_at_the_triple_point() {
        assert_relative_eq!(vapour_over_ice(273.16).unwrap(), 611.657, max_relative = 2e-5);
        assert_relative_eq!(vapour_over_water(273.16).unwrap(), 611.657, max_relative = 5e-4);
    }

    /// Incropera and DeWitt, table A.4, rows and half-way; the Lewis number of vapour in air is about 0.86.
    #[test]
    fn properties_of_air_are_those_of_the_table() {
        let air = Air::at(300.0).unwrap();
        assert_eq!((air.density, air.prandtl), (1.1614, 0.707));
        assert_relative_eq!(Air::at(225.0).unwrap().viscosity, 9.515e-6, max_relative = 1e-9);
        assert_relative_eq!(
            air.diffusivity,
            air.conductivity / (air.density * air.specific_heat),
            max_relative = 5e-3
        );
        assert_relative_eq!(Air::at(298.0).unwrap().lewis(), 0.86, max_relative = 1e-2);
        assert!(Air::at(140.0).is_err() && Air::at(351.0).is_err());
    }
}
