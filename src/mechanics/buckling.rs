//! A thin liner pressed inwards by its housing: the pressure at which its wall buckles.

use super::error::MechanicsError;
use super::ring::check;

/// Wall over mean diameter up to which the formulas of a thin wall are used. Common practice, no source.
pub const THIN: f64 = 0.05;

/// A liner; lengths m.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Liner {
    /// Inner diameter, m.
    pub inner_diameter: f64,
    /// Outer diameter, m.
    pub outer_diameter: f64,
    /// Young's modulus, Pa.
    pub youngs_modulus: f64,
    /// Poisson's ratio.
    pub poisson: f64,
}

impl Liner {
    /// Wall over mean diameter.
    pub fn slenderness(&self) -> f64 {
        (self.outer_diameter - self.inner_diameter) / (self.outer_diameter + self.inner_diameter)
    }

    /// Pressure at which a long tube that nothing holds round buckles, Pa; below it the liner cannot buckle.
    ///
    /// p = 2 E/(1 − ν²) (t/D)³
    ///
    /// t wall (m), D mean diameter (m), E Young's modulus (Pa), ν Poisson's ratio.
    ///
    /// Holds for a thin elastic wall, t/D ≤ [`THIN`]. A short liner with held ends stands more. Source: Timoshenko &
    /// Gere, *Theory of Elastic Stability*, 2nd ed., § 7.5 (ring and tube under uniform external pressure).
    ///
    /// # Errors
    /// Diameters out of order, a modulus that is not positive, Poisson's ratio outside (−1, 0.5), a wall too thick.
    ///
    /// # Example
    /// ```
    /// use hubgrip::mechanics::buckling::Liner;
    /// // t/D = 1/50: 2 · 100 GPa/0.91 · 8e-6.
    /// let liner = Liner { inner_diameter: 0.049, outer_diameter: 0.051, youngs_modulus: 100e9, poisson: 0.3 };
    /// assert!((liner.free_pressure().unwrap() - 1.758242e6).abs() < 1.0);
    /// ```
    pub fn free_pressure(&self) -> Result<f64, MechanicsError> {
        Ok(2.0 * self.plate_modulus()? * self.slenderness().powi(3))
    }

    /// Pressure at which a liner without play in a rigid housing buckles inwards in one place, Pa.
    ///
    /// p = E/(1 − ν²) (t/D)^2.2
    ///
    /// Symbols as in [`Self::free_pressure`].
    ///
    /// Derived for a pressure that follows the wall as it lifts, such as that of water behind it; the contact pressure
    /// of a fit falls there, so the liner stands more. Roundness and straightness of the wall are taken as perfect.
    /// Holds for t/D ≤ [`THIN`], elastic. Source: D. Glock, *Überkritisches Verhalten eines starr ummantelten
    /// Kreisrohres bei Wasserdruck von außen und Temperaturdehnung*, Der Stahlbau 46 (1977) 212–217 (from memory).
    ///
    /// # Errors
    /// As [`Self::free_pressure`].
    ///
    /// # Example
    /// ```
    /// use hubgrip::mechanics::buckling::Liner;
    /// let liner = Liner { inner_diameter: 0.049, outer_diameter: 0.051, youngs_modulus: 100e9, poisson: 0.3 };
    /// assert!(liner.housed_pressure().unwrap() > 10.0 * liner.free_pressure().unwrap());
    /// ```
    pub fn housed_pressure(&self) -> Result<f64, MechanicsError> {
        Ok(self.plate_modulus()? * self.slenderness().powf(2.2))
    }

    fn plate_modulus(&self) -> Result<f64, MechanicsError> {
        let Self { inner_diameter, outer_diameter, youngs_modulus, poisson } = *self;
        check("inner diameter (m)", inner_diameter, "positive", inner_diameter > 0.0)?;
        check(
            "outer diameter (m)",
            outer_diameter,
            "above the inner diameter",
            outer_diameter > inner_diameter,
        )?;
        check("Young's modulus (Pa)", youngs_modulus, "positive", youngs_modulus > 0.0)?;
        check("Poisson's ratio", poisson, "between -1 and 0.5", poisson > -1.0 && poisson < 0.5)?;
        let slenderness = self.slenderness();
        check("wall over mean diameter", slenderness, "at most 0.05", slenderness <= THIN)?;
        Ok(youngs_modulus / (1.0 - poisson * poisson))
    }
}
