//! Two rings in closed form.

use super::error::MechanicsError;
use super::ring::check;

/// A hub on a shaft; lengths m, moduli Pa.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct TwoRings {
    /// Joint diameter.
    pub diameter: f64,
    /// Outer diameter of the hub.
    pub hub_outer_diameter: f64,
    /// Bore of the shaft; zero when solid.
    pub shaft_bore: f64,
    /// Young's modulus of the hub.
    pub hub_youngs_modulus: f64,
    /// Poisson's ratio of the hub.
    pub hub_poisson: f64,
    /// Young's modulus of the shaft.
    pub shaft_youngs_modulus: f64,
    /// Poisson's ratio of the shaft.
    pub shaft_poisson: f64,
}

impl TwoRings {
    /// Contact pressure (Pa) of a diametral interference (m); zero for a clearance.
    ///
    /// p = U / ( d (C_h/E_h + C_s/E_s) ), C_h = (1 + Q²)/(1 − Q²) + ν_h, C_s = (1 + q²)/(1 − q²) − ν_s
    ///
    /// Source: Lamé; Timoshenko & Goodier, *Theory of Elasticity*, § 28.
    ///
    /// # Errors
    /// Diameters out of order, a modulus that is not positive.
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
        check("bore (m)", self.shaft_bore, "zero or more", self.shaft_bore >= 0.0)?;
        check("bore (m)", self.shaft_bore, "below the joint diameter", self.shaft_bore < self.diameter)?;
        let outer = self.hub_outer_diameter;
        check("outer diameter (m)", outer, "above the joint diameter", outer > self.diameter)?;
        check("Young's modulus (Pa)", self.hub_youngs_modulus, "positive", self.hub_youngs_modulus > 0.0)?;
        check(
            "Young's modulus (Pa)",
            self.shaft_youngs_modulus,
            "positive",
            self.shaft_youngs_modulus > 0.0,
        )?;
        let hub = self.hub_hoop_factor() + self.hub_poisson;
        let shaft = factor(self.diameter, self.shaft_bore) - self.shaft_poisson;
        let flexibility = hub / self.hub_youngs_modulus + shaft / self.shaft_youngs_modulus;
        Ok((interference / (self.diameter * flexibility)).max(0.0))
    }

    /// Hoop stress at the hub bore over the pressure, (1 + Q²)/(1 − Q²).
    pub fn hub_hoop_factor(&self) -> f64 {
        factor(self.hub_outer_diameter, self.diameter)
    }
}

fn factor(outer: f64, inner: f64) -> f64 {
    (outer * outer + inner * inner) / ((outer - inner) * (outer + inner))
}
