//! The yield rule of the hub, by name.

use super::hub::{HubElasticity, HubLimit};
use super::tresca::TrescaHub;
use super::von_mises::{SQRT_3, VonMisesHub};
use crate::mechanics::error::MechanicsError;
use crate::mechanics::ring::Stress;

/// Rule by which the hub yields.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum YieldRule {
    /// Greatest shear stress, S₀ = Re: low for a ductile steel, so safe for strength and for holding.
    #[default]
    Tresca,
    /// Tresca's closed form with S₀ = 2 Re/√3, after DIN 7190-1: up to 15 % above von Mises, most in thin hubs.
    ModifiedTresca,
    /// Greatest distortion energy: the reference for ductile metals.
    VonMises,
}

impl YieldRule {
    /// Name for a report.
    pub fn name(self) -> &'static str {
        match self {
            Self::Tresca => "Tresca",
            Self::ModifiedTresca => "modified Tresca, 2 Re/√3",
            Self::VonMises => "von Mises",
        }
    }
}

/// A hub under one of the rules.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) enum Hub {
    Tresca(TrescaHub),
    VonMises(VonMisesHub),
}

impl Hub {
    pub(super) fn new(
        rule: YieldRule,
        yield_strength: f64,
        diameter_ratio: f64,
    ) -> Result<Self, MechanicsError> {
        Ok(match rule {
            YieldRule::Tresca => Self::Tresca(TrescaHub::new(yield_strength, diameter_ratio)?),
            YieldRule::ModifiedTresca => {
                Self::Tresca(TrescaHub::new(2.0 * yield_strength / SQRT_3, diameter_ratio)?)
            }
            YieldRule::VonMises => Self::VonMises(VonMisesHub::new(yield_strength, diameter_ratio)?),
        })
    }

    pub(super) fn onset_pressure(&self) -> f64 {
        match self {
            Self::Tresca(hub) => hub.onset_pressure(),
            Self::VonMises(hub) => hub.onset_pressure(),
        }
    }

    pub(super) fn limit(&self) -> Result<HubLimit, MechanicsError> {
        match self {
            Self::Tresca(hub) => hub.limit(),
            Self::VonMises(hub) => hub.limit(),
        }
    }

    pub(super) fn pressure(&self, plastic_ratio: f64) -> Result<f64, MechanicsError> {
        match self {
            Self::Tresca(hub) => hub.pressure(plastic_ratio),
            Self::VonMises(hub) => hub.pressure(plastic_ratio),
        }
    }

    pub(super) fn plastic_ratio(&self, pressure: f64) -> Result<f64, MechanicsError> {
        match self {
            Self::Tresca(hub) => hub.plastic_ratio(pressure),
            Self::VonMises(hub) => hub.plastic_ratio(pressure),
        }
    }

    pub(super) fn bore_strain(
        &self,
        plastic_ratio: f64,
        elasticity: HubElasticity,
    ) -> Result<f64, MechanicsError> {
        match self {
            Self::Tresca(hub) => hub.bore_strain(plastic_ratio, elasticity),
            Self::VonMises(hub) => hub.bore_strain(plastic_ratio, elasticity),
        }
    }

    pub(super) fn stress_at(&self, plastic_ratio: f64, radius_ratio: f64) -> Result<Stress, MechanicsError> {
        match self {
            Self::Tresca(hub) => hub.stress_at(plastic_ratio, radius_ratio),
            Self::VonMises(hub) => hub.stress_at(plastic_ratio, radius_ratio),
        }
    }
}
