//! Heat from a chilled part to boiling nitrogen.

use std::f64::consts::PI;

use super::error::{AssemblyError, positive};

/// Properties of a liquid and its vapour film at atmospheric pressure.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct BoilingFluid {
    /// Boiling temperature, K.
    pub boiling_temperature: f64,
    /// Heat of vaporisation, J/kg.
    pub latent_heat: f64,
    /// Density of the liquid, kg/m³.
    pub liquid_density: f64,
    /// Surface tension, N/m.
    pub surface_tension: f64,
    /// Conductivity of the vapour film, W/(m·K).
    pub vapour_conductivity: f64,
    /// Density of the vapour film, kg/m³.
    pub vapour_density: f64,
    /// Viscosity of the vapour film, Pa·s.
    pub vapour_viscosity: f64,
    /// Specific heat of the vapour, J/(kg·K).
    pub vapour_specific_heat: f64,
}

/// Nitrogen at 1 atm, the vapour at a film temperature near 185 K.
///
/// Source: latent heat 199.2 kJ/kg and boiling point 77.36 K, NIST; the other values from memory of NIST
/// REFPROP tables, to about 2 %.
pub const NITROGEN: BoilingFluid = BoilingFluid {
    boiling_temperature: 77.36,
    latent_heat: 199.2e3,
    liquid_density: 806.6,
    surface_tension: 8.85e-3,
    vapour_conductivity: 0.0176,
    vapour_density: 1.83,
    vapour_viscosity: 1.2e-5,
    vapour_specific_heat: 1060.0,
};

/// Standard acceleration of free fall, m/s² (exact by definition, 3rd CGPM 1901).
const FREE_FALL: f64 = 9.806_65;

/// Film-boiling coefficient of a horizontal cylinder by Bromley, W/(m²·K).
///
/// h = 0.62 d^(−1/4) F,  F = [k_v³ ρ_v (ρ_l − ρ_v) g h′ / (μ_v ΔT)]^(1/4),  h′ = h_fg + 0.4 c_p ΔT
///
/// | symbol | meaning | unit | valid |
/// |---|---|---|---|
/// | d | diameter | m | 0 < d, up to about the wavelength λ of [`breen_westwater`] |
/// | ΔT | wall above the boiling temperature | K | > 0, film boiling |
///
/// Laminar vapour film, saturated liquid at rest, radiation neglected.
///
/// Source: L. A. Bromley, *Heat Transfer in Stable Film Boiling*, Chemical Engineering Progress 46 (1950)
/// 221–227.
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// ```
/// use hubgrip::assembly::boiling::{NITROGEN, bromley};
/// assert!((bromley(&NITROGEN, 0.05, 273.15).unwrap() - 72.7104).abs() < 1e-3);
/// ```
pub fn bromley(fluid: &BoilingFluid, diameter: f64, wall: f64) -> Result<f64, AssemblyError> {
    positive("cylinder diameter (m)", diameter)?;
    let superheat = superheat(fluid, wall)?;
    let heat = fluid.latent_heat + 0.4 * fluid.vapour_specific_heat * superheat;
    Ok(0.62 * film_group(fluid, heat, superheat) / diameter.powf(0.25))
}

/// Film-boiling coefficient of a horizontal cylinder by Breen and Westwater, W/(m²·K).
///
/// h = (0.59 + 0.069 λ/d) F λ^(−1/4),  λ = 2π √(σ / (g (ρ_l − ρ_v))),  h′ = h_fg (1 + 0.34 c_p ΔT / h_fg)²
///
/// with F as in [`bromley`]. λ is about 6.6 mm in liquid nitrogen; shafts are thicker than that, so this is
/// the one to use for them.
///
/// | symbol | meaning | unit | valid |
/// |---|---|---|---|
/// | d | diameter | m | > 0; correlated for λ/d from 0.15 to 300 |
/// | ΔT | wall above the boiling temperature | K | > 0, film boiling |
///
/// Source: B. P. Breen and J. W. Westwater, *Effect of Diameter of Horizontal Tubes on Film Boiling Heat
/// Transfer*, Chemical Engineering Progress 58 (1962) no. 7, 67–72.
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// ```
/// use hubgrip::assembly::boiling::{NITROGEN, breen_westwater};
/// assert!((breen_westwater(&NITROGEN, 0.05, 273.15).unwrap() - 124.0983).abs() < 1e-3);
/// ```
pub fn breen_westwater(fluid: &BoilingFluid, diameter: f64, wall: f64) -> Result<f64, AssemblyError> {
    positive("cylinder diameter (m)", diameter)?;
    let superheat = superheat(fluid, wall)?;
    Ok(film_coefficient(fluid, diameter, superheat))
}

fn film_coefficient(fluid: &BoilingFluid, diameter: f64, superheat: f64) -> f64 {
    let wavelength = 2.0
        * PI
        * (fluid.surface_tension / (FREE_FALL * (fluid.liquid_density - fluid.vapour_density))).sqrt();
    let sensible = 1.0 + 0.34 * fluid.vapour_specific_heat * superheat / fluid.latent_heat;
    let group = film_group(fluid, fluid.latent_heat * sensible * sensible, superheat);
    (0.59 + 0.069 * wavelength / diameter) * group / wavelength.sqrt().sqrt()
}

fn film_group(fluid: &BoilingFluid, heat: f64, superheat: f64) -> f64 {
    let lift = fluid.vapour_density * (fluid.liquid_density - fluid.vapour_density) * FREE_FALL;
    (fluid.vapour_conductivity.powi(3) * lift * heat / (fluid.vapour_viscosity * superheat)).sqrt().sqrt()
}

fn superheat(fluid: &BoilingFluid, wall: f64) -> Result<f64, AssemblyError> {
    positive("wall temperature above boiling (K)", wall - fluid.boiling_temperature)
}

/// Wall superheat at which the vapour film collapses, K (NBS Technical Note 317, from memory; 25 K to 50 K).
pub const COLLAPSE_SUPERHEAT: f64 = 32.0;
/// Wall superheat at the peak of nucleate boiling, K (NBS Technical Note 317, from memory; 8 K to 15 K).
pub const PEAK_SUPERHEAT: f64 = 11.0;
/// Peak heat flux of nucleate boiling in saturated nitrogen, W/m² (Zuber's relation; 12 to 20 W/cm²).
pub const PEAK_HEAT_FLUX: f64 = 16.2e4;

/// Heat flux from a wall to a pool of saturated nitrogen over the whole boiling curve, W/m².
///
/// | wall above boiling | regime | heat flux |
/// |---|---|---|
/// | above 32 K | film boiling | [`breen_westwater`] |
/// | 11 K to 32 K | transition | power law between its two ends |
/// | 0 to 11 K | nucleate | 16.2 W/cm² (ΔT / 11 K)³ |
///
/// A wall colder than the pool takes up heat by the mirrored nucleate branch, so that a solution may pass
/// through zero. The collapse of the film depends on roughness, frost and coatings: times to the end of the
/// soak are good to some tens of per cent, no better.
///
/// Source: film branch Breen and Westwater 1962; collapse and peak after E. G. Brentari, P. J. Giarratano and
/// R. V. Smith, NBS Technical Note 317 (1965), from memory; the cube law of nucleate boiling is Rohsenow's.
pub fn nitrogen_heat_flux(diameter: f64, wall: f64) -> f64 {
    let superheat = wall - NITROGEN.boiling_temperature;
    if superheat >= COLLAPSE_SUPERHEAT {
        return film_coefficient(&NITROGEN, diameter, superheat) * superheat;
    }
    if superheat > PEAK_SUPERHEAT {
        let least = film_coefficient(&NITROGEN, diameter, COLLAPSE_SUPERHEAT) * COLLAPSE_SUPERHEAT;
        let share = (superheat / PEAK_SUPERHEAT).ln() / (COLLAPSE_SUPERHEAT / PEAK_SUPERHEAT).ln();
        return PEAK_HEAT_FLUX * (least / PEAK_HEAT_FLUX).powf(share);
    }
    PEAK_HEAT_FLUX * (superheat / PEAK_SUPERHEAT).powi(3)
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    /// d = 50 mm, wall 273.15 K, with the property values above: Bromley 1950 and Breen–Westwater 1962
    /// evaluated by hand.
    #[test]
    fn film_boiling_of_a_fifty_millimetre_shaft() {
        assert_relative_eq!(bromley(&NITROGEN, 0.05, 273.15).unwrap(), 72.710_419, max_relative = 1e-7);
        assert_relative_eq!(
            breen_westwater(&NITROGEN, 0.05, 273.15).unwrap(),
            124.098_340,
            max_relative = 1e-7
        );
        assert!(bromley(&NITROGEN, 0.05, 77.0).is_err());
    }

    #[test]
    fn boiling_curve_is_continuous_and_has_one_valley() {
        let flux = |superheat: f64| nitrogen_heat_flux(0.05, NITROGEN.boiling_temperature + superheat);
        for corner in [PEAK_SUPERHEAT, COLLAPSE_SUPERHEAT] {
            assert_relative_eq!(flux(corner - 1e-9), flux(corner + 1e-9), max_relative = 1e-6);
        }
        assert!(flux(20.0) < flux(11.0) && flux(32.0) < flux(20.0) && flux(100.0) > flux(32.0));
        assert!(flux(-1.0) < 0.0 && flux(0.0) == 0.0);
        // Minimum heat flux of saturated nitrogen, 0.5 to 1.0 W/cm² (Berenson's relation; NBS TN 317).
        assert!((0.5e4..1.0e4).contains(&flux(COLLAPSE_SUPERHEAT)));
    }
}
