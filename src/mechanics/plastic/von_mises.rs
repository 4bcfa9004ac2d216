//! The hub after von Mises: stresses by Nadai's parameter, displacement by the flow rule along the history.
//!
//! The state in the plastic zone is told by one angle x, zero where σφ loses its influence on yielding at the
//! greatest pressure and π/2 at a free rim:
//!
//! σr = −K cos x, σφ = −K cos(x + π/3), K = 2 Re/√3
//!
//! Along a radius r² sin(5π/6 − x) e^(−√3 x) is constant; at the edge of the zone r = c, with m = (c/b)², the
//! elastic outside gives cot(5π/6 − x_c) = m/√3.

use std::f64::consts::{FRAC_PI_2, FRAC_PI_3, FRAC_PI_6};

use super::growth;
use super::hub::{
    HubElasticity, HubLimit, HubLimitKind, check_hub, check_radius, check_zone, elastic_stress,
};
use crate::mechanics::error::MechanicsError;
use crate::mechanics::ring::{Stress, check};
use crate::numerics::root;

pub(super) const SQRT_3: f64 = 1.732_050_807_568_877_2;

/// A hub that yields after von Mises, perfectly plastic, in plane stress, rim free.
///
/// Source: A. Nadai, *Theory of Flow and Fracture of Solids*, McGraw-Hill 1950; R. Hill, *The Mathematical Theory
/// of Plasticity*, Oxford 1950, the circular hole in an infinite sheet (chapter from memory: XI). The displacement
/// is derived here from the Prandtl-Reuss flow rule, see [`Self::bore_strain`].
///
/// # Example
/// ```
/// use hubgrip::mechanics::plastic::{HubElasticity, von_mises::VonMisesHub};
/// let hub = VonMisesHub::new(300e6, 0.5).unwrap();
/// assert!((hub.onset_pressure() - 128.571429e6).abs() < 1.0);
/// assert!((hub.pressure(1.2).unwrap() - 171.221949e6).abs() < 1.0);
/// let steel = HubElasticity { youngs_modulus: 200e9, poisson: 0.3 };
/// assert!((hub.bore_strain(1.2, steel).unwrap() - 1.83429884e-3).abs() < 1e-11);
/// ```
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct VonMisesHub {
    yield_strength: f64,
    diameter_ratio: f64,
}

impl VonMisesHub {
    /// A hub of yield strength Re (Pa) and Q = d/D.
    ///
    /// # Errors
    /// Re not positive, Q outside (0, 1).
    pub fn new(yield_strength: f64, diameter_ratio: f64) -> Result<Self, MechanicsError> {
        check_hub(yield_strength, diameter_ratio)?;
        Ok(Self { yield_strength, diameter_ratio })
    }

    /// Yield strength Re, Pa.
    pub fn yield_strength(&self) -> f64 {
        self.yield_strength
    }

    /// Q = d/D.
    pub fn diameter_ratio(&self) -> f64 {
        self.diameter_ratio
    }

    /// Smallest Q = d/D that can become fully plastic: Q² = √3 exp(−π√3/2), Q = 0.33766654.
    ///
    /// A thicker hub meets the pressure cap 2 Re/√3 first.
    pub fn least_fully_plastic_ratio() -> f64 {
        (SQRT_3 * (-FRAC_PI_2 * SQRT_3).exp()).sqrt()
    }

    /// Pressure at which the bore begins to yield, Pa: p_E = Re (1 − Q²)/√(3 + Q⁴).
    pub fn onset_pressure(&self) -> f64 {
        let q = self.diameter_ratio;
        self.yield_strength * (1.0 - q) * (1.0 + q) / (3.0 + q.powi(4)).sqrt()
    }

    /// Greatest pressure the hub carries.
    ///
    /// Q ≥ 0.33766654: fully plastic, the rim at x = π/2 and the bore at the x_a that follows from it,
    /// p_L = (2 Re/√3) cos x_a. Below: p_L = 2 Re/√3 at x_a = 0.
    ///
    /// # Errors
    /// None that a hub accepted by [`Self::new`] can bring about; the root finder's are passed on.
    pub fn limit(&self) -> Result<HubLimit, MechanicsError> {
        if self.diameter_ratio >= Self::least_fully_plastic_ratio() {
            let pressure = self.flow_stress() * self.bore_angle(1.0)?.cos();
            let kind = HubLimitKind::FullyPlastic;
            return Ok(HubLimit { pressure, plastic_ratio: 1.0 / self.diameter_ratio, kind });
        }
        let front =
            root::bracketed(|m| self.bore_level(m), self.bore_front(), 1.0, 0.0).map_err(|reason| {
                MechanicsError::NotSolved { what: "plastic zone at the pressure cap", reason }
            })?;
        let plastic_ratio = front.sqrt() / self.diameter_ratio;
        Ok(HubLimit { pressure: self.flow_stress(), plastic_ratio, kind: HubLimitKind::PressureCap })
    }

    /// Pressure (Pa) that makes the hub plastic out to ζ times the joint diameter: p = (2 Re/√3) cos x_a.
    ///
    /// # Errors
    /// ζ outside 1 … ζ_L.
    pub fn pressure(&self, plastic_ratio: f64) -> Result<f64, MechanicsError> {
        check_zone(plastic_ratio, &self.limit()?)?;
        Ok(self.flow_stress() * self.bore_angle(self.front(plastic_ratio))?.cos())
    }

    /// Plastic zone ζ at a pressure (Pa) between onset and limit.
    ///
    /// # Errors
    /// A pressure outside that range.
    pub fn plastic_ratio(&self, pressure: f64) -> Result<f64, MechanicsError> {
        let limit = self.limit()?;
        let held = pressure >= self.onset_pressure() && pressure <= limit.pressure;
        check("contact pressure (Pa)", pressure, "between the onset of yield and the limit pressure", held)?;
        let level = level_of((pressure / self.flow_stress()).acos());
        let excess = |zeta: f64| level - self.bore_level(self.front(zeta));
        if excess(limit.plastic_ratio) <= 0.0 {
            return Ok(limit.plastic_ratio);
        }
        if excess(1.0) >= 0.0 {
            return Ok(1.0);
        }
        root::bracketed(excess, 1.0, limit.plastic_ratio, 0.0)
            .map_err(|reason| MechanicsError::NotSolved { what: "plastic zone at a pressure", reason })
    }

    /// Stress (Pa) at a radius r/a under a plastic zone ζ.
    ///
    /// Outside the zone σr,φ = k (1 ∓ (b/r)²), k = Re m/√(3 + m²), m = (c/b)².
    ///
    /// # Errors
    /// ζ out of range, a radius outside the hub.
    pub fn stress_at(&self, plastic_ratio: f64, radius_ratio: f64) -> Result<Stress, MechanicsError> {
        check_radius(radius_ratio, self.diameter_ratio)?;
        check_zone(plastic_ratio, &self.limit()?)?;
        let front = self.front(plastic_ratio);
        if radius_ratio >= plastic_ratio {
            let k = self.yield_strength * front / (3.0 + front * front).sqrt();
            return Ok(elastic_stress(k, 1.0 / (self.diameter_ratio * radius_ratio)));
        }
        let edge = edge_angle(front);
        let angle = angle_of(level_of(edge) - 2.0 * (plastic_ratio / radius_ratio).ln(), edge)?;
        let flow = self.flow_stress();
        Ok(Stress { radial: -flow * angle.cos(), hoop: -flow * (angle + FRAC_PI_3).cos() })
    }

    /// Hoop strain of the bore, u(a)/a, at a plastic zone ζ reached from the unloaded hub.
    ///
    /// u(a)/a = u_E(a)/a + ∫ w dm, m = (c/b)² from Q² to its value at ζ, with w the rate of u(a)/a from the
    /// Prandtl-Reuss flow rule:
    ///
    /// w = e^(√3 (x_c − x_a)) (dk/dm)/E ((1 − ν) + (1 + ν)/m)
    ///   + (Re/(√3 E)) κ′ { (½ − ν) (e^(√3 (x_c − x_a)) sin(x_c + π/6) − sin(x_a + π/6))
    ///   + ¾ ∫ e^(√3 (x − x_a))/sin x dx from x_a to x_c }
    ///
    /// with k = Re m/√(3 + m²) and κ′ = 3 (1 − m)/(m (3 + m²)). Accurate to about 1e-12 of its value, against a division of the history eight times as fine.
    ///
    /// Source: derived here. With y = (∂u/∂κ)/r and κ = ln(r² sin t e^(√3 t)), t = 5π/6 − x, the rate equations
    /// ε̇r = ε̇r^e + (n_r/n_φ) (ε̇φ − ε̇φ^e) become dy/dt = √3 y − g(t)/(2E),
    /// g = (σr′² − 2ν σr′ σφ′ + σφ′²)/σr′, a linear equation with constant coefficients.
    ///
    /// # Errors
    /// ζ out of range, E ≤ 0, ν outside (−1, 0.5).
    pub fn bore_strain(&self, plastic_ratio: f64, elasticity: HubElasticity) -> Result<f64, MechanicsError> {
        elasticity.check()?;
        let limit = self.limit()?;
        check_zone(plastic_ratio, &limit)?;
        let start = self.bore_front();
        let (end, last) = (self.front(plastic_ratio), self.front(limit.plastic_ratio));
        let rate = |m: f64| growth::rate(m, edge_angle(m), self.bore_angle(m)?, elasticity.poisson);
        let plastic = growth::along_history(rate, start, end, last)?;
        let onset = growth::onset(start, elasticity.poisson);
        Ok((onset + plastic) * self.yield_strength / elasticity.youngs_modulus)
    }

    /// K = 2 Re/√3, Pa.
    fn flow_stress(&self) -> f64 {
        2.0 * self.yield_strength / SQRT_3
    }

    /// m at the onset of yield.
    fn bore_front(&self) -> f64 {
        self.diameter_ratio * self.diameter_ratio
    }

    /// m = (c/b)² at a plastic zone ζ.
    fn front(&self, plastic_ratio: f64) -> f64 {
        (self.diameter_ratio * plastic_ratio).powi(2).clamp(self.bore_front(), 1.0)
    }

    /// Level of the bore when the zone ends at m.
    fn bore_level(&self, front: f64) -> f64 {
        level_of(edge_angle(front)) - (front / self.bore_front()).ln()
    }

    /// x_a at the bore when the zone ends at m.
    fn bore_angle(&self, front: f64) -> Result<f64, MechanicsError> {
        angle_of(self.bore_level(front), edge_angle(front))
    }
}

/// x_c at the edge of the zone: cot(5π/6 − x_c) = m/√3.
fn edge_angle(front: f64) -> f64 {
    5.0 * FRAC_PI_6 - SQRT_3.atan2(front)
}

/// √3 x − ln(2 sin(5π/6 − x)): it rises with ln r² within the zone, from zero at x = 0.
fn level_of(angle: f64) -> f64 {
    let half = (0.5 * angle).sin();
    SQRT_3 * angle - (SQRT_3 * angle.sin() - 2.0 * half * half).ln_1p()
}

/// The angle between 0 and `edge` at a level; the nearer end when rounding puts the level outside.
fn angle_of(level: f64, edge: f64) -> Result<f64, MechanicsError> {
    if level <= 0.0 {
        return Ok(0.0);
    }
    if level >= level_of(edge) {
        return Ok(edge);
    }
    root::bracketed(|x| level_of(x) - level, 0.0, edge, 0.0)
        .map_err(|reason| MechanicsError::NotSolved { what: "state of the plastic zone", reason })
}
