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
/// Assumes plane stress. Source: R. von Mises (1913); Timoshenko & Goodier, *Theory of Elasticity*.
///
/// # Example
/// ```
/// let stress = hubgrip::mechanics::criteria::von_mises(-75e6, 125e6);
/// assert!((stress - 175e6).abs() < 1.0);
/// ```
pub fn von_mises(radial: f64, hoop: f64) -> f64 {
    (radial * radial + hoop * hoop - radial * hoop).sqrt()
}

/// Tresca equivalent of a radial and a hoop stress, Pa: the axial stress zero counts as well.
///
/// σt = max(|σr − σφ|, |σr|, |σφ|)
///
/// # Example
/// ```
/// assert_eq!(hubgrip::mechanics::criteria::tresca(-75e6, 125e6), 200e6);
/// assert_eq!(hubgrip::mechanics::criteria::tresca(-75e6, -75e6), 75e6);
/// ```
pub fn tresca(radial: f64, hoop: f64) -> f64 {
    (radial - hoop).abs().max(radial.abs()).max(hoop.abs())
}

/// Greatest principal stress (tension positive), Pa; zero where all is compression, since σz = 0.
pub fn greatest_principal(radial: f64, hoop: f64) -> f64 {
    radial.max(hoop).max(0.0)
}
