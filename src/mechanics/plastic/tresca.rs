//! The hub after Tresca, in closed form.

use super::hub::{
    HubElasticity, HubLimit, HubLimitKind, check_hub, check_radius, check_zone, elastic_stress,
};
use crate::mechanics::error::MechanicsError;
use crate::mechanics::ring::{Stress, check};
use crate::numerics::root;

/// A hub that yields when σφ − σr reaches S₀, perfectly plastic, in plane stress, rim free.
///
/// S₀ = Re is Tresca's rule, S₀ = 2 Re/√3 the "modified" one of DIN 7190-1. The axial stress zero must stay
/// the intermediate principal stress: σφ ≥ 0 at the bore, that is p ≤ S₀; [`Self::limit`] keeps to it.
///
/// Source: F. G. Kollmann, *Welle-Nabe-Verbindungen*, Springer 1984; U. Gamer and R. H. Lance,
/// *Elastisch-plastische Spannungen im Schrumpfsitz*, Forschung im Ingenieurwesen 48 (1982) (title from memory).
///
/// # Example
/// ```
/// use hubgrip::mechanics::plastic::{HubElasticity, tresca::TrescaHub};
/// let hub = TrescaHub::new(300e6, 0.5).unwrap();
/// assert!((hub.onset_pressure() - 112.5e6).abs() < 1.0);
/// assert!((hub.pressure(1.2).unwrap() - 150.696467e6).abs() < 1.0);
/// assert!((hub.limit().unwrap().pressure - 207.944154e6).abs() < 1.0);
/// ```
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct TrescaHub {
    yield_difference: f64,
    diameter_ratio: f64,
}

impl TrescaHub {
    /// A hub with yield value S₀ of the greatest principal stress difference (Pa) and Q = d/D.
    ///
    /// # Errors
    /// S₀ not positive, Q outside (0, 1).
    pub fn new(yield_difference: f64, diameter_ratio: f64) -> Result<Self, MechanicsError> {
        check_hub(yield_difference, diameter_ratio)?;
        Ok(Self { yield_difference, diameter_ratio })
    }

    /// Yield value S₀ of the greatest principal stress difference, Pa.
    pub fn yield_difference(&self) -> f64 {
        self.yield_difference
    }

    /// Q = d/D.
    pub fn diameter_ratio(&self) -> f64 {
        self.diameter_ratio
    }

    /// Pressure at which the bore begins to yield, Pa: p_E = S₀ (1 − Q²)/2.
    pub fn onset_pressure(&self) -> f64 {
        let q = self.diameter_ratio;
        0.5 * self.yield_difference * (1.0 - q) * (1.0 + q)
    }

    /// Greatest pressure the hub carries.
    ///
    /// Q ≥ 1/e: fully plastic, p_L = −S₀ ln Q. Q < 1/e: p_L = S₀, where σφ falls to zero at the bore; the zone
    /// ζ_L is then the root of 1 + 2 ln ζ − Q²ζ² = 2.
    ///
    /// # Errors
    /// None that a hub accepted by [`Self::new`] can bring about; the root finder's are passed on.
    pub fn limit(&self) -> Result<HubLimit, MechanicsError> {
        let q = self.diameter_ratio;
        let fully_plastic = -self.yield_difference * q.ln();
        if fully_plastic <= self.yield_difference {
            let kind = HubLimitKind::FullyPlastic;
            return Ok(HubLimit { pressure: fully_plastic, plastic_ratio: 1.0 / q, kind });
        }
        let plastic_ratio =
            root::bracketed(|zeta| self.pressure_share(zeta) - 1.0, 1.0, 1.0 / q, 0.0).map_err(|reason| {
                MechanicsError::NotSolved { what: "plastic zone at the pressure cap", reason }
            })?;
        Ok(HubLimit { pressure: self.yield_difference, plastic_ratio, kind: HubLimitKind::PressureCap })
    }

    /// Pressure (Pa) that makes the hub plastic out to ζ times the joint diameter.
    ///
    /// p = (S₀/2) (1 + 2 ln ζ − Q² ζ²), 1 ≤ ζ ≤ ζ_L
    ///
    /// # Errors
    /// ζ outside that range.
    pub fn pressure(&self, plastic_ratio: f64) -> Result<f64, MechanicsError> {
        check_zone(plastic_ratio, &self.limit()?)?;
        Ok(self.yield_difference * self.pressure_share(plastic_ratio))
    }

    /// Plastic zone ζ at a pressure (Pa) between onset and limit.
    ///
    /// # Errors
    /// A pressure outside that range.
    pub fn plastic_ratio(&self, pressure: f64) -> Result<f64, MechanicsError> {
        let limit = self.limit()?;
        let held = pressure >= self.onset_pressure() && pressure <= limit.pressure;
        check("contact pressure (Pa)", pressure, "between the onset of yield and the limit pressure", held)?;
        let excess = |zeta: f64| self.pressure_share(zeta) - pressure / self.yield_difference;
        if excess(limit.plastic_ratio) <= 0.0 {
            return Ok(limit.plastic_ratio);
        }
        if excess(1.0) >= 0.0 {
            return Ok(1.0);
        }
        root::bracketed(excess, 1.0, limit.plastic_ratio, 0.0)
            .map_err(|reason| MechanicsError::NotSolved { what: "plastic zone at a pressure", reason })
    }

    /// Hoop strain of the bore, u(a)/a, at a plastic zone ζ.
    ///
    /// u(a)/a = (S₀ ζ² − (1 − ν) p)/E
    ///
    /// Plastic flow on the face σφ − σr = S₀ leaves εr + εφ elastic, so no history is needed.
    ///
    /// # Errors
    /// ζ out of range, E ≤ 0, ν outside (−1, 0.5).
    pub fn bore_strain(&self, plastic_ratio: f64, elasticity: HubElasticity) -> Result<f64, MechanicsError> {
        elasticity.check()?;
        let pressure = self.pressure(plastic_ratio)?;
        let spread = self.yield_difference * plastic_ratio * plastic_ratio;
        Ok((spread - (1.0 - elasticity.poisson) * pressure) / elasticity.youngs_modulus)
    }

    /// Stress (Pa) at a radius r/a under a plastic zone ζ.
    ///
    /// Plastic zone: σr = −p + S₀ ln(r/a), σφ = σr + S₀. Outside: σr,φ = k (1 ∓ (b/r)²), k = S₀ Q² ζ²/2.
    ///
    /// # Errors
    /// ζ out of range, a radius outside the hub.
    pub fn stress_at(&self, plastic_ratio: f64, radius_ratio: f64) -> Result<Stress, MechanicsError> {
        check_radius(radius_ratio, self.diameter_ratio)?;
        let pressure = self.pressure(plastic_ratio)?;
        if radius_ratio < plastic_ratio {
            let radial = -pressure + self.yield_difference * radius_ratio.ln();
            return Ok(Stress { radial, hoop: radial + self.yield_difference });
        }
        Ok(elastic_stress(self.elastic_zone(plastic_ratio), 1.0 / (self.diameter_ratio * radius_ratio)))
    }

    /// k = S₀ Q² ζ²/2, half the hoop stress at the rim.
    fn elastic_zone(&self, plastic_ratio: f64) -> f64 {
        0.5 * self.yield_difference * (self.diameter_ratio * plastic_ratio).powi(2)
    }

    /// p/S₀ at a plastic zone ζ.
    fn pressure_share(&self, plastic_ratio: f64) -> f64 {
        let front = self.diameter_ratio * plastic_ratio;
        0.5 * (1.0 - front) * (1.0 + front) + plastic_ratio.ln()
    }
}
