//! The shaft's elastic limit, and the limits that are commonly quoted, for information.

use super::von_mises::{SQRT_3, VonMisesHub};
use crate::mechanics::error::MechanicsError;
use crate::mechanics::ring::check;

/// A limit as the criterion gives it and as it is commonly printed, Pa.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct QuotedLimit {
    /// Contact pressure at which the part begins to yield, Pa.
    pub exact: f64,
    /// Contact pressure that is commonly printed, Pa.
    pub quoted: f64,
}

impl QuotedLimit {
    /// How much the quoted value is above the exact one, as a share of the exact one.
    pub fn excess(&self) -> f64 {
        self.quoted / self.exact - 1.0
    }
}

/// Contact pressure at which an elastic shaft begins to yield, Pa, by Tresca and von Mises alike.
///
/// solid: p = Re; hollow: p = Re (1 − q²)/2, at its bore
///
/// Re yield strength Pa, q = d_i/d. A solid shaft stands under −p in both directions, the bore of a hollow one is
/// uniaxial, so both criteria agree. A solid shaft is not the limit q → 0 of the hollow one. Plane stress, at rest.
///
/// Source: Lamé; Timoshenko & Goodier, *Theory of Elasticity*, § 28.
///
/// # Errors
/// Re not positive, q outside [0, 1).
///
/// # Example
/// ```
/// let limit = hubgrip::mechanics::plastic::shaft::elastic_limit(300e6, 0.4).unwrap();
/// assert!((limit - 126e6).abs() < 1e-3);
/// ```
pub fn elastic_limit(yield_strength: f64, bore_ratio: f64) -> Result<f64, MechanicsError> {
    check("yield strength of the shaft (Pa)", yield_strength, "positive", yield_strength > 0.0)?;
    let shaft = (0.0..1.0).contains(&bore_ratio);
    check("shaft bore over joint diameter", bore_ratio, "0 or more and below 1", shaft)?;
    if bore_ratio == 0.0 {
        return Ok(yield_strength);
    }
    Ok(0.5 * yield_strength * (1.0 - bore_ratio) * (1.0 + bore_ratio))
}

/// The shaft's limit beside the commonly printed one, which is 2/√3 times as high: not a criterion in plane stress.
///
/// Quoted: solid 2 Re/√3, hollow Re (1 − q²)/√3. Source of the quoted form: textbooks after DIN 7190-1.
///
/// # Errors
/// As [`elastic_limit`].
pub fn quoted_shaft_limit(yield_strength: f64, bore_ratio: f64) -> Result<QuotedLimit, MechanicsError> {
    let exact = elastic_limit(yield_strength, bore_ratio)?;
    Ok(QuotedLimit { exact, quoted: 2.0 / SQRT_3 * exact })
}

/// The hub's onset of yield by von Mises beside the commonly printed Re (1 − Q²)/√3.
///
/// Re yield strength Pa, Q = d/D. Source of the quoted form: textbooks after DIN 7190-1.
///
/// # Errors
/// Re not positive, Q outside (0, 1).
///
/// # Example
/// ```
/// let limit = hubgrip::mechanics::plastic::shaft::quoted_hub_limit(300e6, 0.8).unwrap();
/// assert!((limit.excess() - 0.066).abs() < 0.0005);
/// ```
pub fn quoted_hub_limit(yield_strength: f64, diameter_ratio: f64) -> Result<QuotedLimit, MechanicsError> {
    let exact = VonMisesHub::new(yield_strength, diameter_ratio)?.onset_pressure();
    Ok(QuotedLimit { exact, quoted: yield_strength * (1.0 - diameter_ratio * diameter_ratio) / SQRT_3 })
}
