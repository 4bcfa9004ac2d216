//! What size and surface take from the fatigue strength of a shaft, beside the notch at the hub edge.
//!
//! The strength that a small polished bar bears in rotating bending is divided by one reduction, which joins the
//! notch factor of the place, the size of the shaft and the roughness of its surface. Steels only. Nominal stresses
//! and published factors, to be set beside the joint; not a fatigue calculation: mean stress, corrosion, fretting
//! beyond that of the notch tests, and finite life are left out.

use super::error::MechanicsError;
use super::ring::check;

/// Diameter of the bars that the strength is found on, m: size takes nothing below it. DIN 743-2, from memory.
pub const BAR_DIAMETER: f64 = 7.5e-3;

/// Diameter above which size takes no more, m. DIN 743-2, from memory.
pub const LARGE_DIAMETER: f64 = 0.150;

/// Share of the strength in rotating bending that a smooth bar of this diameter keeps.
///
/// K₂ = 1 − 0.2 lg(d/7.5 mm)/lg 20, from 1 at 7.5 mm to 0.8 at 150 mm
///
/// d diameter (m), positive; below 7.5 mm it is 1, above 150 mm 0.8. It stands for the steepness of the stress
/// under the surface, which is less in a thick shaft. What heat treatment loses in a thick section is not in it: that
/// is in the tensile strength of the section. Source: DIN 743-2, size factor K₂ in bending and torsion, from
/// memory.
///
/// # Errors
/// A diameter that is not positive.
///
/// # Example
/// ```
/// use hubgrip::mechanics::fatigue::size_factor;
/// assert_eq!(size_factor(0.005).unwrap(), 1.0);
/// assert!((size_factor(0.040).unwrap() - 0.8882).abs() < 1e-4);
/// assert!((size_factor(0.300).unwrap() - 0.8).abs() < 1e-12);
/// ```
pub fn size_factor(diameter: f64) -> Result<f64, MechanicsError> {
    Ok(1.0 - 0.2 * size_share(diameter)?)
}

/// A notch factor that was measured on shafts of one diameter, carried over to another.
///
/// β(d) = β(d₀) K₃(d₀)/K₃(d), K₃(d) = 1 − 0.2 lg β(d₀) lg(d/7.5 mm)/lg 20
///
/// β fatigue notch factor, 1 to 10; d₀ the diameter it was measured at, d the one wanted (m), both positive; d/7.5 mm
/// is taken as 1 at least and as 20 at most. The notch bites deeper in a thick shaft. Source: DIN 743-2, size factor
/// K₃ of measured notch factors, from memory.
///
/// # Errors
/// A notch factor outside 1 to 10, a diameter that is not positive.
///
/// # Example
/// ```
/// use hubgrip::mechanics::fatigue::notch_factor_at;
/// assert_eq!(notch_factor_at(2.0, 0.040, 0.040).unwrap(), 2.0);
/// assert!(notch_factor_at(2.0, 0.040, 0.100).unwrap() > 2.0);
/// ```
pub fn notch_factor_at(factor: f64, measured_at: f64, diameter: f64) -> Result<f64, MechanicsError> {
    let allowed = (1.0..=10.0).contains(&factor);
    check("fatigue notch factor", factor, "1 to 10", allowed)?;
    let size = |diameter: f64| Ok::<_, MechanicsError>(1.0 - 0.2 * factor.log10() * size_share(diameter)?);
    Ok(factor * size(measured_at)? / size(diameter)?)
}

/// Share of the strength in bending that a rough surface leaves.
///
/// K_F = 1 − 0.22 lg(Rz/1 µm) (lg(R_m/20 MPa) − 1), at most 1
///
/// Rz mean peak-to-valley height (m), above zero and up to 200 µm; R_m tensile strength (Pa), 200 to 2000 MPa: the
/// harder the steel, the more a groove takes. Source: DIN 743-2, surface factor in bending, from memory; the
/// same formula is in the FKM guideline, from memory.
///
/// # Errors
/// A roughness or a tensile strength outside its range.
///
/// # Example
/// ```
/// use hubgrip::mechanics::fatigue::surface_factor;
/// assert_eq!(surface_factor(1e-6, 800e6).unwrap(), 1.0);
/// assert!((surface_factor(10e-6, 800e6).unwrap() - 0.8675).abs() < 1e-4);
/// ```
pub fn surface_factor(roughness: f64, tensile_strength: f64) -> Result<f64, MechanicsError> {
    let is_roughness = roughness > 0.0 && roughness <= 200e-6;
    check("roughness Rz (m)", roughness, "above zero and up to 200 µm", is_roughness)?;
    let is_strength = (200e6..=2000e6).contains(&tensile_strength);
    check("tensile strength (Pa)", tensile_strength, "200 to 2000 MPa", is_strength)?;
    let taken = 0.22 * (roughness / 1e-6).log10() * ((tensile_strength / 20e6).log10() - 1.0);
    Ok((1.0 - taken).min(1.0))
}

/// By what the strength of the small polished bar is divided at a notch.
///
/// K = β/K₂ + 1/K_F − 1
///
/// β notch factor at the diameter ([`notch_factor_at`]), K₂ size factor, K_F surface factor. Source: DIN
/// 743-1, total influence in bending without surface hardening, from memory.
///
/// # Errors
/// A notch factor below 1, a size or surface factor that is not above 0 and at most 1.
///
/// # Example
/// ```
/// use hubgrip::mechanics::fatigue::reduction;
/// assert_eq!(reduction(2.0, 1.0, 1.0).unwrap(), 2.0);
/// assert_eq!(reduction(2.0, 0.8, 0.8).unwrap(), 2.75);
/// ```
pub fn reduction(notch: f64, size: f64, surface: f64) -> Result<f64, MechanicsError> {
    check("fatigue notch factor", notch, "1 or more", notch >= 1.0)?;
    let is_share = |share: f64| share > 0.0 && share <= 1.0;
    check("size factor", size, "above 0 and at most 1", is_share(size))?;
    check("surface factor", surface, "above 0 and at most 1", is_share(surface))?;
    Ok(notch / size + 1.0 / surface - 1.0)
}

/// lg(d/7.5 mm)/lg 20, between 0 and 1.
fn size_share(diameter: f64) -> Result<f64, MechanicsError> {
    check("diameter (m)", diameter, "positive", diameter > 0.0)?;
    let within = diameter.clamp(BAR_DIAMETER, LARGE_DIAMETER);
    Ok((within / BAR_DIAMETER).ln() / (LARGE_DIAMETER / BAR_DIAMETER).ln())
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    /// lg 10 = 1, so a notch factor of 10 is carried over by the size factor of the smooth bar itself.
    #[test]
    fn both_size_factors_meet_at_a_notch_factor_of_ten() {
        for diameter in [0.005, 0.020, 0.050, 0.120, 0.400] {
            let carried = notch_factor_at(10.0, BAR_DIAMETER, diameter).unwrap();
            assert_relative_eq!(carried, 10.0 / size_factor(diameter).unwrap(), max_relative = 1e-12);
        }
    }

    #[test]
    fn carrying_a_factor_there_gives_what_the_ratio_of_both_sizes_says() {
        // By hand: d/7.5 = 5.3333 and 13.333; lg 2.17 = 0.336460; lg 20 = 1.301030.
        // K3(40) = 1 - 0.2*0.336460*0.726999/1.301030 = 0.962398; K3(100) = 1 - 0.2*0.336460*1.124939/1.301030 = 0.941816.
        let carried = notch_factor_at(2.17, 0.040, 0.100).unwrap();
        assert_relative_eq!(carried, 2.17 * 0.962_398 / 0.941_816, max_relative = 2e-6);
        assert_relative_eq!(notch_factor_at(1.0, 0.040, 0.1).unwrap(), 1.0);
    }

    #[test]
    fn what_no_steel_shaft_has_is_refused() {
        assert!(size_factor(0.0).is_err());
        assert!(size_factor(f64::NAN).is_err());
        assert!(notch_factor_at(0.9, 0.04, 0.04).is_err());
        assert!(notch_factor_at(2.0, -1.0, 0.04).is_err());
        assert!(surface_factor(0.0, 600e6).is_err());
        assert!(surface_factor(201e-6, 600e6).is_err());
        assert!(surface_factor(10e-6, 100e6).is_err());
        assert!(reduction(2.0, 0.0, 1.0).is_err());
        assert!(reduction(2.0, 1.0, 1.1).is_err());
        assert!(reduction(0.5, 1.0, 1.0).is_err());
    }

    #[test]
    fn a_rougher_and_harder_shaft_keeps_less() {
        let factor =
            |roughness: f64, strength: f64| surface_factor(roughness * 1e-6, strength * 1e6).unwrap();
        assert!(factor(25.0, 800.0) < factor(6.3, 800.0));
        assert!(factor(6.3, 1200.0) < factor(6.3, 600.0));
        assert_eq!(factor(0.4, 1000.0), 1.0);
    }
}
