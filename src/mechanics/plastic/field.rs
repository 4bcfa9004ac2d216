//! Stresses in the hub, loaded and after the shaft is gone.

use super::hub::{check_radius, elastic_stress};
use super::rule::Hub;
use crate::mechanics::error::MechanicsError;
use crate::mechanics::ring::Stress;

/// Stress at one radius of the hub.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct HubPoint {
    /// Radius, m.
    pub radius: f64,
    /// Stress with the shaft in place, Pa.
    pub loaded: Stress,
    /// Stress left when the shaft is taken out, Pa.
    pub residual: Stress,
}

/// The hub at one pressure.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Field {
    pub(super) hub: Hub,
    pub(super) diameter_ratio: f64,
    pub(super) pressure: f64,
    /// Nothing when the hub is elastic.
    pub(super) plastic_ratio: Option<f64>,
}

impl Field {
    pub(super) fn loaded(&self, radius_ratio: f64) -> Result<Stress, MechanicsError> {
        match self.plastic_ratio {
            Some(plastic_ratio) => self.hub.stress_at(plastic_ratio, radius_ratio),
            None => self.elastic(radius_ratio),
        }
    }

    /// Loaded stress less the elastic stress of the same pressure.
    pub(super) fn residual(&self, radius_ratio: f64) -> Result<Stress, MechanicsError> {
        if self.plastic_ratio.is_none() {
            check_radius(radius_ratio, self.diameter_ratio)?;
            return Ok(Stress { radial: 0.0, hoop: 0.0 });
        }
        let (loaded, elastic) = (self.loaded(radius_ratio)?, self.elastic(radius_ratio)?);
        Ok(Stress { radial: loaded.radial - elastic.radial, hoop: loaded.hoop - elastic.hoop })
    }

    fn elastic(&self, radius_ratio: f64) -> Result<Stress, MechanicsError> {
        check_radius(radius_ratio, self.diameter_ratio)?;
        let q2 = self.diameter_ratio * self.diameter_ratio;
        Ok(elastic_stress(self.pressure * q2 / (1.0 - q2), 1.0 / (self.diameter_ratio * radius_ratio)))
    }
}
