//! Strength criteria in plane stress (σz = 0): von Mises, Tresca, greatest principal stress.

/// Criterion for ductile parts.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum DuctileCriterion {
    /// Greatest distortion energy.
    #[default]
    VonMises,
    /// Greatest shear stress.
    Tresca,
}

/// von Mises equivalent of a radial and a hoop stress, Pa.
///
/// σv = √(σr² + σφ² − σr σφ)
///
/// σr, σφ radial and hoop stress (Pa, tension positive), both principal.
///
/// Plane stress, σz = 0; for ductile materials. Source: R. von Mises (1913); Timoshenko & Goodier, *Theory of
/// Elasticity*, 3rd ed.
///
/// # Example
/// ```
/// let stress = hubgrip::mechanics::criteria::von_mises(-75e6, 125e6);
/// assert!((stress - 175e6).abs() < 1.0);
/// ```
pub fn von_mises(radial: f64, hoop: f64) -> f64 {
    (radial * radial + hoop * hoop - radial * hoop).sqrt()
}

/// Tresca equivalent of a radial and a hoop stress, Pa.
///
/// σt = max(|σr − σφ|, |σr|, |σφ|)
///
/// σr, σφ radial and hoop stress (Pa, tension positive), both principal. The last two terms are the differences from
/// the axial stress zero; without them a solid shaft under pressure would never yield.
///
/// Plane stress, σz = 0; for ductile materials. Source: H. Tresca (1864); R. Hill, *The Mathematical Theory of
/// Plasticity* (1950), chapter II.
///
/// # Example
/// ```
/// assert_eq!(hubgrip::mechanics::criteria::tresca(-75e6, 125e6), 200e6);
/// assert_eq!(hubgrip::mechanics::criteria::tresca(-75e6, -75e6), 75e6);
/// ```
pub fn tresca(radial: f64, hoop: f64) -> f64 {
    (radial - hoop).abs().max(radial.abs()).max(hoop.abs())
}

/// Equivalent tension of a brittle material that stands more compression than tension, Pa.
///
/// σe = max(σ₁, −σ₃ R_m/R_c)
///
/// σ₁ greatest principal stress ([`greatest_principal`], Pa), σ₃ least one, or zero when all is tension (Pa), R_m/R_c
/// `tension_share`, tensile over compressive strength; zero leaves compression out.
///
/// Plane stress, σz = 0; R_m/σe is the lesser of the safeties against both strengths. Where tension and compression
/// meet it holds while the compression is not the greater, as in a hub's bore (modified Mohr hypothesis, of which this
/// is that part). Source: the hypothesis of W. J. M. Rankine with both strengths; N. E. Dowling, *Mechanical Behavior
/// of Materials*, chapter on fracture under combined stresses (from memory).
///
/// # Example
/// ```
/// use hubgrip::mechanics::criteria::brittle;
/// assert_eq!(brittle(-75e6, 125e6, 0.25), 125e6);
/// assert_eq!(brittle(0.0, -200e6, 0.25), 50e6);
/// assert_eq!(brittle(0.0, -200e6, 0.0), 0.0);
/// ```
pub fn brittle(radial: f64, hoop: f64, tension_share: f64) -> f64 {
    greatest_principal(radial, hoop).max(-radial.min(hoop) * tension_share)
}

/// Greatest principal stress, Pa, tension positive; zero where all is compression.
///
/// σ₁ = max(σr, σφ, 0)
///
/// σr, σφ radial and hoop stress (Pa, tension positive), both principal; the third is the axial stress zero.
///
/// Plane stress, σz = 0; for brittle materials such as grey iron. Source: the hypothesis of W. J. M. Rankine;
/// Timoshenko, *Strength of Materials*, part II.
///
/// # Example
/// ```
/// assert_eq!(hubgrip::mechanics::criteria::greatest_principal(-75e6, 125e6), 125e6);
/// assert_eq!(hubgrip::mechanics::criteria::greatest_principal(-75e6, -75e6), 0.0);
/// ```
pub fn greatest_principal(radial: f64, hoop: f64) -> f64 {
    radial.max(hoop).max(0.0)
}
