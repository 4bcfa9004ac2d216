//! The joint with a hub that may yield: limits, and the state at an interference.

use super::field::Field;
use super::hub::{HubElasticity, HubLimitKind};
use super::rule::{Hub, YieldRule};
use super::shaft::{self, QuotedLimit};
use super::state::{PermanentGrowth, PlasticState, Regime};
use crate::mechanics::error::MechanicsError;
use crate::mechanics::ring::check;
use crate::mechanics::two_rings::TwoRings;
use crate::numerics::root;

/// A hub that may yield on a shaft that must not.
///
/// Perfectly plastic, plane stress, at rest, at one temperature, joined for the first time.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct HubYield {
    /// Sizes and elastic constants.
    pub rings: TwoRings,
    /// Rule by which the hub yields.
    pub rule: YieldRule,
    /// Yield strength of the hub, Pa.
    pub hub_yield_strength: f64,
    /// Yield strength of the shaft, Pa.
    pub shaft_yield_strength: f64,
}

/// Where a joint begins to yield and where its pressure ends. Interferences diametral, m; pressures Pa.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PlasticLimits {
    /// Pressure at which the hub begins to yield.
    pub onset_pressure: f64,
    /// Interference at which the hub begins to yield.
    pub onset_interference: f64,
    /// Greatest pressure of the hub.
    pub limit_pressure: f64,
    /// Plastic zone over joint diameter when it is reached.
    pub limit_plastic_ratio: f64,
    /// Interference at which it is reached on a shaft that stays elastic.
    pub limit_interference: f64,
    /// What sets it.
    pub limit_kind: HubLimitKind,
    /// Pressure at which the shaft begins to yield.
    pub shaft_limit: f64,
    /// Interference at which the shaft begins to yield; nothing when the hub's limit pressure is too low for that.
    pub shaft_yield_interference: Option<f64>,
    /// The hub's onset by von Mises beside the commonly quoted value, for information.
    pub quoted_hub: QuotedLimit,
    /// The shaft's limit beside the commonly quoted value, for information.
    pub quoted_shaft: QuotedLimit,
}

/// A checked joint, ready to be solved at any interference.
///
/// # Example
/// ```
/// use hubgrip::mechanics::plastic::{HubYield, PlasticJoint, Regime, YieldRule};
/// use hubgrip::mechanics::two_rings::TwoRings;
/// let rings = TwoRings {
///     diameter: 0.05,
///     hub_outer_diameter: 0.1,
///     shaft_bore: 0.0,
///     hub_youngs_modulus: 200e9,
///     hub_poisson: 0.3,
///     shaft_youngs_modulus: 200e9,
///     shaft_poisson: 0.3,
/// };
/// let joint = PlasticJoint::new(HubYield {
///     rings,
///     rule: YieldRule::Tresca,
///     hub_yield_strength: 300e6,
///     shaft_yield_strength: 300e6,
/// })
/// .unwrap();
/// let state = joint.solve(125e-6).unwrap();
/// assert_eq!(state.regime, Regime::ElasticPlastic);
/// assert!((state.pressure - 164.123844e6).abs() < 1.0);
/// assert!((state.plastic_share - 0.222222).abs() < 1e-6);
/// ```
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PlasticJoint {
    input: HubYield,
    pub(super) hub: Hub,
    limits: PlasticLimits,
}

impl PlasticJoint {
    /// Checks the joint and finds its limits.
    ///
    /// # Errors
    /// Diameters out of order, a modulus or yield strength that is not positive, Poisson's ratio outside (−1, 0.5).
    pub fn new(input: HubYield) -> Result<Self, MechanicsError> {
        let rings = input.rings;
        check("joint diameter (m)", rings.diameter, "positive", rings.diameter > 0.0)?;
        let modulus = rings.shaft_youngs_modulus;
        check("Young's modulus of the shaft (Pa)", modulus, "positive", modulus > 0.0)?;
        let poisson = rings.shaft_poisson;
        check(
            "Poisson's ratio of the shaft",
            poisson,
            "between -1 and 0.5",
            poisson > -1.0 && poisson < 0.5,
        )?;
        elasticity(&rings).check()?;
        let hub = Hub::new(input.rule, input.hub_yield_strength, diameter_ratio(&rings))?;
        let quoted_hub = shaft::quoted_hub_limit(input.hub_yield_strength, diameter_ratio(&rings))?;
        let bore_ratio = rings.shaft_bore / rings.diameter;
        let quoted_shaft = shaft::quoted_shaft_limit(input.shaft_yield_strength, bore_ratio)?;
        let limit = hub.limit()?;
        let onset_pressure = hub.onset_pressure();
        let limits = PlasticLimits {
            onset_pressure,
            onset_interference: interference_at(&rings, &hub, 1.0)?,
            limit_pressure: limit.pressure,
            limit_plastic_ratio: limit.plastic_ratio,
            limit_interference: interference_at(&rings, &hub, limit.plastic_ratio)?,
            limit_kind: limit.kind,
            shaft_limit: quoted_shaft.exact,
            shaft_yield_interference: shaft_yield(&rings, &hub, quoted_shaft.exact, limit.pressure)?,
            quoted_hub,
            quoted_shaft,
        };
        Ok(Self { input, hub, limits })
    }

    /// What was given.
    pub fn input(&self) -> &HubYield {
        &self.input
    }

    /// Where the joint begins to yield and where its pressure ends.
    pub fn limits(&self) -> &PlasticLimits {
        &self.limits
    }

    /// The joint at a diametral interference (m).
    ///
    /// Elastic up to the onset; then the plastic zone ζ with U/d = u(a)/a + p ((1 + q²)/(1 − q²) − ν_s)/E_s; from
    /// the limit on, the pressure stays and the bore takes the rest.
    ///
    /// # Errors
    /// [`MechanicsError::ShaftYields`] when the pressure is above the shaft's elastic limit; an interference that is
    /// not finite.
    pub fn solve(&self, interference: f64) -> Result<PlasticState, MechanicsError> {
        check("interference (m)", interference, "finite", true)?;
        let limits = &self.limits;
        if interference <= limits.onset_interference {
            let pressure = self.input.rings.pressure(interference)?;
            return self.state(Regime::Elastic, interference, pressure, None);
        }
        if interference >= limits.limit_interference {
            let regime = match limits.limit_kind {
                HubLimitKind::FullyPlastic => Regime::FullyPlastic,
                HubLimitKind::PressureCap => Regime::PressureCap,
            };
            return self.state(regime, interference, limits.limit_pressure, Some(limits.limit_plastic_ratio));
        }
        let missing = |zeta: f64| {
            self.interference_at(zeta).map_or(f64::NAN, |found| (found - interference) / interference)
        };
        let plastic_ratio =
            root::bracketed(missing, 1.0, limits.limit_plastic_ratio, 0.0).map_err(|reason| {
                MechanicsError::NotSolved { what: "plastic zone at an interference", reason }
            })?;
        let pressure = self.hub.pressure(plastic_ratio)?;
        self.state(Regime::ElasticPlastic, interference, pressure, Some(plastic_ratio))
    }

    /// Diametral interference (m) that makes the hub plastic out to ζ times the joint diameter, 1 ≤ ζ ≤ ζ_L.
    ///
    /// # Errors
    /// ζ outside that range.
    pub fn interference_at(&self, plastic_ratio: f64) -> Result<f64, MechanicsError> {
        interference_at(&self.input.rings, &self.hub, plastic_ratio)
    }

    /// Diametral interference (m) that makes a share of the hub's section plastic: ζ² = 1 + q_pl (1/Q² − 1).
    ///
    /// # Errors
    /// A share outside 0 … 1, or one beyond the pressure cap.
    pub fn interference_at_share(&self, plastic_share: f64) -> Result<f64, MechanicsError> {
        let share = (0.0..=1.0).contains(&plastic_share);
        check("plastic share of the section", plastic_share, "between 0 and 1", share)?;
        let rim = diameter_ratio(&self.input.rings).powi(-2);
        self.interference_at((1.0 + plastic_share * (rim - 1.0)).sqrt())
    }

    fn state(
        &self,
        regime: Regime,
        interference: f64,
        pressure: f64,
        plastic_ratio: Option<f64>,
    ) -> Result<PlasticState, MechanicsError> {
        let shaft_limit = self.limits.shaft_limit;
        if pressure > shaft_limit * (1.0 + 1e-12) {
            return Err(MechanicsError::ShaftYields { pressure, limit: shaft_limit });
        }
        let rings = self.input.rings;
        let (diameter, ratio) = (rings.diameter, diameter_ratio(&rings));
        let field = Field { hub: self.hub, diameter_ratio: ratio, pressure, plastic_ratio };
        let shaft_reduction = diameter * pressure * shaft_flexibility(&rings);
        let bore_growth = (interference.max(0.0) - shaft_reduction).max(0.0);
        let rim = rings.hub_outer_diameter / rings.hub_youngs_modulus;
        let recovery = diameter * pressure * hub_flexibility(&rings);
        let permanent = PermanentGrowth {
            bore: if plastic_ratio.is_some() { bore_growth - recovery } else { 0.0 },
            rim: rim * field.residual(1.0 / ratio)?.hoop,
            reverse_yield: field.residual(1.0)?.hoop < -self.input.hub_yield_strength,
        };
        let zone = plastic_ratio.unwrap_or(1.0);
        Ok(PlasticState {
            rule: self.input.rule,
            regime,
            interference,
            pressure,
            elastic_pressure: rings.pressure(interference)?,
            plastic_ratio: zone,
            plastic_diameter: zone * diameter,
            plastic_share: (zone * zone - 1.0) / (ratio.powi(-2) - 1.0),
            bore_growth,
            rim_growth: rim * field.loaded(1.0 / ratio)?.hoop,
            shaft_reduction,
            permanent,
            shaft_limit,
            bore_radius: 0.5 * diameter,
            field,
        })
    }
}

fn elasticity(rings: &TwoRings) -> HubElasticity {
    HubElasticity { youngs_modulus: rings.hub_youngs_modulus, poisson: rings.hub_poisson }
}

/// Q = d/D.
fn diameter_ratio(rings: &TwoRings) -> f64 {
    rings.diameter / rings.hub_outer_diameter
}

/// Elastic hoop strain of the hub's bore per pressure, 1/Pa.
fn hub_flexibility(rings: &TwoRings) -> f64 {
    (rings.hub_hoop_factor() + rings.hub_poisson) / rings.hub_youngs_modulus
}

/// Hoop strain of the shaft's surface per pressure, inwards, 1/Pa.
fn shaft_flexibility(rings: &TwoRings) -> f64 {
    let q2 = (rings.shaft_bore / rings.diameter).powi(2);
    ((1.0 + q2) / (1.0 - q2) - rings.shaft_poisson) / rings.shaft_youngs_modulus
}

fn elastic_flexibility(rings: &TwoRings) -> f64 {
    hub_flexibility(rings) + shaft_flexibility(rings)
}

fn interference_at(rings: &TwoRings, hub: &Hub, plastic_ratio: f64) -> Result<f64, MechanicsError> {
    let strain = hub.bore_strain(plastic_ratio, elasticity(rings))?;
    Ok(rings.diameter * (strain + hub.pressure(plastic_ratio)? * shaft_flexibility(rings)))
}

/// Interference at which the shaft begins to yield, when the hub can bring up the pressure.
fn shaft_yield(
    rings: &TwoRings,
    hub: &Hub,
    shaft_limit: f64,
    hub_limit: f64,
) -> Result<Option<f64>, MechanicsError> {
    if shaft_limit >= hub_limit {
        return Ok(None);
    }
    if shaft_limit <= hub.onset_pressure() {
        return Ok(Some(rings.diameter * shaft_limit * elastic_flexibility(rings)));
    }
    interference_at(rings, hub, hub.plastic_ratio(shaft_limit)?).map(Some)
}
