//! What the yield rules share: the elastic zone of the hub and the words for its limit.

use crate::mechanics::error::MechanicsError;
use crate::mechanics::ring::{Stress, check};

/// Elastic constants of the hub.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct HubElasticity {
    /// Young's modulus, Pa.
    pub youngs_modulus: f64,
    /// Poisson's ratio.
    pub poisson: f64,
}

impl HubElasticity {
    pub(super) fn check(&self) -> Result<(), MechanicsError> {
        let (modulus, poisson) = (self.youngs_modulus, self.poisson);
        check("Young's modulus of the hub (Pa)", modulus, "positive", modulus > 0.0)?;
        check("Poisson's ratio of the hub", poisson, "between -1 and 0.5", poisson > -1.0 && poisson < 0.5)
    }
}

/// What ends the rise of the pressure.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum HubLimitKind {
    /// The plastic zone reaches the rim.
    FullyPlastic,
    /// The pressure reaches the greatest that the yield rule allows at the bore before the zone reaches the rim.
    PressureCap,
}

/// Greatest pressure a perfectly plastic hub can carry.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct HubLimit {
    /// Limit pressure, Pa.
    pub pressure: f64,
    /// Diameter of the plastic zone over the joint diameter at that pressure.
    pub plastic_ratio: f64,
    /// What sets the limit.
    pub kind: HubLimitKind,
}

/// Stress in the elastic zone of a hub with a free rim: σr,φ = k (1 ∓ (b/r)²).
pub(super) fn elastic_stress(k: f64, rim_over_radius: f64) -> Stress {
    let swing = rim_over_radius * rim_over_radius;
    Stress { radial: k * (1.0 - swing), hoop: k * (1.0 + swing) }
}

/// Refuses a ratio of diameters that is no hub.
pub(super) fn check_hub(yield_value: f64, diameter_ratio: f64) -> Result<(), MechanicsError> {
    check("yield strength of the hub (Pa)", yield_value, "positive", yield_value > 0.0)?;
    let hub = diameter_ratio > 0.0 && diameter_ratio < 1.0;
    check("joint diameter over outer diameter", diameter_ratio, "above 0 and below 1", hub)
}

/// Refuses a plastic zone that ends inside the bore or beyond the limit, up to rounding.
pub(super) fn check_zone(plastic_ratio: f64, limit: &HubLimit) -> Result<(), MechanicsError> {
    let slack = 1e-12 * limit.plastic_ratio;
    let held = plastic_ratio >= 1.0 - slack && plastic_ratio <= limit.plastic_ratio + slack;
    check(
        "plastic zone over joint diameter",
        plastic_ratio,
        "between 1 and its value at the limit pressure",
        held,
    )
}

/// Refuses a radius (over the bore radius) outside the hub.
pub(super) fn check_radius(radius_ratio: f64, diameter_ratio: f64) -> Result<(), MechanicsError> {
    let slack = 1e-9;
    let inside = radius_ratio >= 1.0 - slack && radius_ratio * diameter_ratio <= 1.0 + slack;
    check("radius over bore radius", radius_ratio, "within the hub", inside)
}
