//! A plastic joint at one interference: everything a report needs.

use super::field::{Field, HubPoint};
use super::rule::YieldRule;
use crate::mechanics::error::MechanicsError;
use crate::mechanics::ring::{Stress, check};

/// Greatest plastic share of the hub's section that designs commonly allow. Source: common practice, quoted with
/// DIN 7190-1.
pub const COMMON_PLASTIC_SHARE: f64 = 0.3;

/// What the hub does at an interference.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Regime {
    /// Nothing yields.
    Elastic,
    /// The hub is plastic from the bore to a radius within its wall.
    ElasticPlastic,
    /// The whole wall is plastic; the pressure no longer rises.
    FullyPlastic,
    /// The pressure has met the greatest the yield rule allows; the strain concentrates at the bore. Not a design
    /// to accept.
    PressureCap,
}

/// What remains when the shaft is taken out. Diametral, m.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PermanentGrowth {
    /// Growth of the bore: loaded growth less the elastic recovery of the same pressure.
    pub bore: f64,
    /// Growth of the outer diameter.
    pub rim: f64,
    /// The bore would yield in compression on the way out, so the elastic recovery does not hold and the growth
    /// is overstated: residual hoop stress below −Re, for Tresca the same as p > Re (1 − Q²). The bore is then
    /// uniaxial, so the modified rule, too, is held against Re. Overstated by at most 0.7 % (Tresca) and 3.3 %
    /// (von Mises) in finite elements of hubs from Q = 0.1 on, close to the pressure cap.
    pub reverse_yield: bool,
}

/// A joint at one interference. Lengths m, pressures and stresses Pa.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PlasticState {
    /// Rule by which the hub yields.
    pub rule: YieldRule,
    /// What the hub does.
    pub regime: Regime,
    /// Diametral interference.
    pub interference: f64,
    /// Contact pressure; zero for a clearance.
    pub pressure: f64,
    /// Pressure that the elastic formula would give, for comparison.
    pub elastic_pressure: f64,
    /// Diameter of the plastic zone over the joint diameter; 1 when elastic.
    pub plastic_ratio: f64,
    /// Diameter of the plastic zone; the joint diameter when elastic.
    pub plastic_diameter: f64,
    /// Plastic share of the hub's section: (ζ² − 1)/(1/Q² − 1).
    pub plastic_share: f64,
    /// Diametral growth of the bore.
    pub bore_growth: f64,
    /// Diametral growth of the outer diameter.
    pub rim_growth: f64,
    /// Diametral reduction of the shaft.
    pub shaft_reduction: f64,
    /// What remains when the shaft is taken out.
    pub permanent: PermanentGrowth,
    /// Contact pressure at which the shaft begins to yield.
    pub shaft_limit: f64,
    pub(super) bore_radius: f64,
    pub(super) field: Field,
}

impl PlasticState {
    /// Stress in the hub at radius `r` (m).
    ///
    /// # Errors
    /// A radius outside the hub.
    pub fn stress_at(&self, r: f64) -> Result<Stress, MechanicsError> {
        self.field.loaded(r / self.bore_radius)
    }

    /// Stress left in the hub at radius `r` (m) when the shaft is taken out, by elastic recovery.
    ///
    /// Does not hold when [`PermanentGrowth::reverse_yield`] is set.
    ///
    /// # Errors
    /// A radius outside the hub.
    pub fn residual_at(&self, r: f64) -> Result<Stress, MechanicsError> {
        self.field.residual(r / self.bore_radius)
    }

    /// Stresses at `count` radii evenly spaced from bore to rim, and at the edge of the plastic zone besides when it
    /// lies within the wall.
    ///
    /// # Errors
    /// Fewer than two radii.
    pub fn profile(&self, count: usize) -> Result<Vec<HubPoint>, MechanicsError> {
        check("number of radii", count as f64, "2 or more", count >= 2)?;
        let rim = 1.0 / self.field.diameter_ratio;
        let step = |index: usize| 1.0 + (rim - 1.0) * index as f64 / (count - 1) as f64;
        let mut ratios: Vec<f64> = (0..count).map(step).collect();
        let edge = self.plastic_ratio;
        if edge > 1.0 && edge < rim && !ratios.contains(&edge) {
            ratios.push(edge);
            ratios.sort_by(f64::total_cmp);
        }
        ratios
            .into_iter()
            .map(|ratio| {
                Ok(HubPoint {
                    radius: ratio * self.bore_radius,
                    loaded: self.field.loaded(ratio)?,
                    residual: self.field.residual(ratio)?,
                })
            })
            .collect()
    }
}
