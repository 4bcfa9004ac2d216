//! Two rings in closed form.

use super::error::MechanicsError;
use super::ring::check;

/// A hub on a shaft; lengths m, moduli Pa.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct TwoRings {
    /// Joint diameter d, m.
    pub diameter: f64,
    /// Outer diameter of the hub D, m.
    pub hub_outer_diameter: f64,
    /// Bore of the shaft dᵢ, m; zero when solid.
    pub shaft_bore: f64,
    /// Young's modulus of the hub E_h, Pa.
    pub hub_youngs_modulus: f64,
    /// Poisson's ratio of the hub ν_h.
    pub hub_poisson: f64,
    /// Young's modulus of the shaft E_s, Pa.
    pub shaft_youngs_modulus: f64,
    /// Poisson's ratio of the shaft ν_s.
    pub shaft_poisson: f64,
}

impl TwoRings {
    /// Contact pressure of a diametral interference; zero for a clearance.
    ///
    /// p = δ / ( d (C_h/E_h + C_s/E_s) ), C_h = (1 + Q²)/(1 − Q²) + ν_h, C_s = (1 + q²)/(1 − q²) − ν_s
    ///
    /// p contact pressure (Pa), δ diametral interference (m), d joint diameter (m), Q = d/D, q = dᵢ/d (ratios),
    /// E Young's modulus (Pa), ν Poisson's ratio.
    ///
    /// Holds for elastic rings at rest and at one temperature, in plane stress, of nominal size (error of the
    /// order δ/d), long enough that the edges do not count (see [`super::finite_length`]).
    ///
    /// Source: G. Lamé; Timoshenko & Goodier, *Theory of Elasticity*, 3rd ed., § 28.
    ///
    /// # Errors
    /// Diameters out of order, a modulus that is not positive, Poisson's ratio outside (−1, 0.5), an interference
    /// that is not finite.
    ///
    /// # Example
    /// ```
    /// use hubgrip::mechanics::two_rings::TwoRings;
    /// let steel = TwoRings {
    ///     diameter: 0.05,
    ///     hub_outer_diameter: 0.1,
    ///     shaft_bore: 0.0,
    ///     hub_youngs_modulus: 200e9,
    ///     hub_poisson: 0.3,
    ///     shaft_youngs_modulus: 200e9,
    ///     shaft_poisson: 0.3,
    /// };
    /// assert!((steel.pressure(50e-6).unwrap() - 75e6).abs() < 1e-3);
    /// ```
    pub fn pressure(&self, interference: f64) -> Result<f64, MechanicsError> {
        check("interference (m)", interference, "finite", true)?;
        Ok((interference / (self.diameter * self.flexibility()?)).max(0.0))
    }

    /// Hoop stress at the hub bore over the pressure, (1 + Q²)/(1 − Q²), Q = d/D.
    ///
    /// Source: Timoshenko & Goodier, *Theory of Elasticity*, 3rd ed., § 28.
    pub fn hub_hoop_factor(&self) -> f64 {
        factor(self.hub_outer_diameter, self.diameter)
    }

    /// Relative interference over pressure, C_h/E_h + C_s/E_s, 1/Pa.
    fn flexibility(&self) -> Result<f64, MechanicsError> {
        self.check()?;
        let hub = self.hub_hoop_factor() + self.hub_poisson;
        let shaft = factor(self.diameter, self.shaft_bore) - self.shaft_poisson;
        Ok(hub / self.hub_youngs_modulus + shaft / self.shaft_youngs_modulus)
    }

    fn check(&self) -> Result<(), MechanicsError> {
        check("bore (m)", self.shaft_bore, "zero or more", self.shaft_bore >= 0.0)?;
        check("joint diameter (m)", self.diameter, "above the bore", self.diameter > self.shaft_bore)?;
        let outer = self.hub_outer_diameter;
        check("outer diameter (m)", outer, "above the joint diameter", outer > self.diameter)?;
        for modulus in [self.hub_youngs_modulus, self.shaft_youngs_modulus] {
            check("Young's modulus (Pa)", modulus, "positive", modulus > 0.0)?;
        }
        for poisson in [self.hub_poisson, self.shaft_poisson] {
            check("Poisson's ratio", poisson, "between -1 and 0.5", poisson > -1.0 && poisson < 0.5)?;
        }
        Ok(())
    }
}

/// (1 + x²)/(1 − x²) of a ring with x = inner/outer.
fn factor(outer: f64, inner: f64) -> f64 {
    (outer * outer + inner * inner) / ((outer - inner) * (outer + inner))
}
