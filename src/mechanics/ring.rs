//! One ring in plane stress: pressure on both faces, rotation, free strain by temperature.

use super::error::MechanicsError;

/// A ring; solid when its inner radius is zero.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct RingSection {
    inner_radius: f64,
    outer_radius: f64,
    youngs_modulus: f64,
    poisson: f64,
    density: f64,
}

/// What acts on a ring.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct RingLoad {
    /// Pressure on the inner face, Pa, positive in compression.
    pub inner_pressure: f64,
    /// Pressure on the outer face, Pa, positive in compression.
    pub outer_pressure: f64,
    /// Angular speed, rad/s.
    pub angular_speed: f64,
    /// Strain of the free ring by temperature; with a `strain_rise`, that at the inner face.
    pub free_strain: f64,
    /// Free strain at the outer face less that at the inner face, in steady radial conduction; zero when uniform.
    pub strain_rise: f64,
}

/// Stress at a radius, Pa, tension positive.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Stress {
    /// Radial stress σr.
    pub radial: f64,
    /// Hoop stress σφ.
    pub hoop: f64,
}

impl RingSection {
    /// A ring of these radii (m), modulus (Pa), Poisson's ratio and density (kg/m³).
    ///
    /// # Errors
    /// Inner radius below zero or not below the outer, modulus not positive, Poisson's ratio outside (−1, 0.5),
    /// density below zero, anything not finite.
    ///
    /// # Example
    /// ```
    /// use hubgrip::mechanics::ring::RingSection;
    /// assert!(RingSection::new(0.025, 0.050, 200e9, 0.3, 7800.0).is_ok());
    /// assert!(RingSection::new(0.050, 0.025, 200e9, 0.3, 7800.0).is_err());
    /// ```
    pub fn new(
        inner_radius: f64,
        outer_radius: f64,
        youngs_modulus: f64,
        poisson: f64,
        density: f64,
    ) -> Result<Self, MechanicsError> {
        check("outer radius (m)", outer_radius, "positive", outer_radius > 0.0)?;
        check("inner radius (m)", inner_radius, "zero or more", inner_radius >= 0.0)?;
        check("inner radius (m)", inner_radius, "below the outer radius", inner_radius < outer_radius)?;
        check("Young's modulus (Pa)", youngs_modulus, "positive", youngs_modulus > 0.0)?;
        check("Poisson's ratio", poisson, "between -1 and 0.5", poisson > -1.0 && poisson < 0.5)?;
        check("density (kg/m³)", density, "zero or more", density >= 0.0)?;
        Ok(Self { inner_radius, outer_radius, youngs_modulus, poisson, density })
    }

    /// The same ring with another Young's modulus (Pa), such as that at its temperature.
    ///
    /// # Errors
    /// A modulus that is not positive or not finite.
    pub fn with_youngs_modulus(self, youngs_modulus: f64) -> Result<Self, MechanicsError> {
        check("Young's modulus (Pa)", youngs_modulus, "positive", youngs_modulus > 0.0)?;
        Ok(Self { youngs_modulus, ..self })
    }

    /// Inner radius a, m.
    pub fn inner_radius(&self) -> f64 {
        self.inner_radius
    }

    /// Outer radius b, m.
    pub fn outer_radius(&self) -> f64 {
        self.outer_radius
    }

    /// Whether it has no bore.
    pub fn is_solid(&self) -> bool {
        self.inner_radius == 0.0
    }

    /// Young's modulus E, Pa.
    pub fn youngs_modulus(&self) -> f64 {
        self.youngs_modulus
    }

    /// Poisson's ratio ν.
    pub fn poisson(&self) -> f64 {
        self.poisson
    }

    /// Density ρ, kg/m³.
    pub fn density(&self) -> f64 {
        self.density
    }

    /// Stress at a radius: that by the pressures, by rotation and by a radial gradient of the free strain, summed.
    ///
    /// Pressure: σr,φ = (pᵢ a² − pₒ b²)/(b² − a²) ∓ (pᵢ − pₒ) a² b²/((b² − a²) r²)
    ///
    /// Rotation: σr = (3+ν)/8 ρ ω² (a² + b² − a² b²/r² − r²),
    /// σφ = (3+ν)/8 ρ ω² (a² + b² + a² b²/r² − (1+3ν)/(3+ν) r²)
    ///
    /// Rotation of a solid ring: σr = (3+ν)/8 ρ ω² (b² − r²), σφ = ρ ω²/8 ((3+ν) b² − (1+3ν) r²)
    ///
    /// Free strain ε: σr = E/r² ((r² − a²) I(b)/(b² − a²) − I(r)),
    /// σφ = E/r² ((r² + a²) I(b)/(b² − a²) + I(r) − ε r²), I(r) = ∫ ε r dr from a to r
    ///
    /// a, b, r inner, outer and any radius (m), pᵢ, pₒ pressure on the inner and outer face (Pa), ρ density (kg/m³),
    /// ω angular speed (rad/s), ν Poisson's ratio, E Young's modulus (Pa).
    ///
    /// Holds for an elastic ring in plane stress (σz = 0, short or with free ends), of constant E and ν. A uniform
    /// free strain gives no stress; a gradient is that of steady conduction, ε = εₐ + (ε_b − εₐ) ln(r/a)/ln(b/a).
    /// A solid ring is not the limit of a vanishing bore, which doubles the hoop stress there.
    ///
    /// Source: Timoshenko & Goodier, *Theory of Elasticity*, 3rd ed., § 28 (pressure), § 32 (rotation) and
    /// chapter 13 (thermal stress in a disc).
    ///
    /// # Errors
    /// A radius outside the ring, a pressure on the inner face or a strain rise in a solid ring, a number that is
    /// not finite.
    ///
    /// # Example
    /// ```
    /// use hubgrip::mechanics::ring::{RingLoad, RingSection};
    /// let ring = RingSection::new(0.025, 0.050, 200e9, 0.3, 7800.0).unwrap();
    /// let load = RingLoad { inner_pressure: 50e6, ..RingLoad::default() };
    /// assert!((ring.stress_at(&load, 0.025).unwrap().hoop - 83.333333e6).abs() < 1.0);
    /// ```
    pub fn stress_at(&self, load: &RingLoad, r: f64) -> Result<Stress, MechanicsError> {
        self.check_place(load, r)?;
        let parts = [self.by_pressure(load, r), self.by_rotation(load, r), self.by_gradient(load, r)];
        Ok(Stress {
            radial: parts.iter().map(|part| part.radial).sum(),
            hoop: parts.iter().map(|part| part.hoop).sum(),
        })
    }

    /// Radial displacement at a radius, m, from Hooke's law for the hoop strain.
    ///
    /// u = r ((σφ − ν σr)/E + ε)
    ///
    /// r radius (m), σr, σφ stresses (Pa, see [`Self::stress_at`], with its validity and source), ν Poisson's ratio,
    /// E Young's modulus (Pa), ε free strain at r.
    ///
    /// # Errors
    /// As [`Self::stress_at`].
    ///
    /// # Example
    /// ```
    /// use hubgrip::mechanics::ring::{RingLoad, RingSection};
    /// let ring = RingSection::new(0.025, 0.050, 200e9, 0.3, 7800.0).unwrap();
    /// let load = RingLoad { inner_pressure: 50e6, ..RingLoad::default() };
    /// assert!((ring.displacement_at(&load, 0.025).unwrap() - 12.2916667e-6).abs() < 1e-13);
    /// ```
    pub fn displacement_at(&self, load: &RingLoad, r: f64) -> Result<f64, MechanicsError> {
        let stress = self.stress_at(load, r)?;
        let elastic = (stress.hoop - self.poisson * stress.radial) / self.youngs_modulus;
        Ok(r * (elastic + load.free_strain + load.strain_rise * self.share_of_rise(r)))
    }

    fn by_pressure(&self, load: &RingLoad, r: f64) -> Stress {
        if self.is_solid() {
            return Stress { radial: -load.outer_pressure, hoop: -load.outer_pressure };
        }
        let (a2, b2) = self.squares();
        let mean = (load.inner_pressure * a2 - load.outer_pressure * b2) / (b2 - a2);
        let swing = (load.inner_pressure - load.outer_pressure) * a2 * b2 / ((b2 - a2) * r * r);
        Stress { radial: mean - swing, hoop: mean + swing }
    }

    fn by_rotation(&self, load: &RingLoad, r: f64) -> Stress {
        let (a2, b2) = self.squares();
        let (radial_factor, hoop_factor) = (3.0 + self.poisson, 1.0 + 3.0 * self.poisson);
        let centrifugal = self.density * load.angular_speed.powi(2) / 8.0;
        let bore = if self.is_solid() { 0.0 } else { a2 * b2 / (r * r) };
        Stress {
            radial: centrifugal * radial_factor * (a2 + b2 - bore - r * r),
            hoop: centrifugal * (radial_factor * (a2 + b2 + bore) - hoop_factor * r * r),
        }
    }

    fn by_gradient(&self, load: &RingLoad, r: f64) -> Stress {
        if load.strain_rise == 0.0 {
            return Stress { radial: 0.0, hoop: 0.0 };
        }
        let (a2, b2) = self.squares();
        let mean = self.share_moment(self.outer_radius) / (b2 - a2);
        let inside = self.share_moment(r);
        let scale = self.youngs_modulus * load.strain_rise / (r * r);
        Stress {
            radial: scale * ((r * r - a2) * mean - inside),
            hoop: scale * ((r * r + a2) * mean + inside - self.share_of_rise(r) * r * r),
        }
    }

    /// Share of the strain rise that is reached at `r`, ln(r/a)/ln(b/a).
    pub(super) fn share_of_rise(&self, r: f64) -> f64 {
        if self.is_solid() { 0.0 } else { self.logarithm(r) / self.logarithm(self.outer_radius) }
    }

    /// Moment of that share from the bore to `r`, (r²/2 ln(r/a) − (r² − a²)/4)/ln(b/a), m².
    pub(super) fn share_moment(&self, r: f64) -> f64 {
        let a = self.inner_radius;
        (0.5 * r * r * self.logarithm(r) - 0.25 * (r - a) * (r + a)) / self.logarithm(self.outer_radius)
    }

    /// ln(r/a), to full precision also in a thin ring.
    fn logarithm(&self, r: f64) -> f64 {
        ((r - self.inner_radius) / self.inner_radius).ln_1p()
    }

    fn squares(&self) -> (f64, f64) {
        (self.inner_radius.powi(2), self.outer_radius.powi(2))
    }

    fn check_place(&self, load: &RingLoad, r: f64) -> Result<(), MechanicsError> {
        let slack = 1e-9 * self.outer_radius;
        let inside = r >= self.inner_radius - slack && r <= self.outer_radius + slack;
        check("radius (m)", r, "within the ring", inside)?;
        let RingLoad { inner_pressure, outer_pressure, angular_speed, free_strain, strain_rise } = *load;
        for value in [inner_pressure, outer_pressure, angular_speed, free_strain, strain_rise] {
            check("pressure, speed or strain on a ring", value, "finite", true)?;
        }
        let allowed = |value: f64| !self.is_solid() || value == 0.0;
        check("pressure in a solid ring (Pa)", inner_pressure, "zero", allowed(inner_pressure))?;
        check("strain rise in a solid ring", strain_rise, "zero", allowed(strain_rise))
    }
}

pub(super) fn check(
    quantity: &'static str,
    given: f64,
    allowed: &'static str,
    holds: bool,
) -> Result<(), MechanicsError> {
    if holds && given.is_finite() {
        Ok(())
    } else {
        Err(MechanicsError::OutsideRange { quantity, given, allowed })
    }
}
