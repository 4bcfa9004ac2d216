//! One ring in plane stress: pressure on both faces, rotation, a uniform free strain.

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

/// What acts on a ring. Pressures Pa, positive in compression; speed rad/s; strain α ΔT of the free ring.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct RingLoad {
    /// Pressure on the inner face, Pa.
    pub inner_pressure: f64,
    /// Pressure on the outer face, Pa.
    pub outer_pressure: f64,
    /// Angular speed, rad/s.
    pub angular_speed: f64,
    /// Strain of the free ring by temperature.
    pub free_strain: f64,
}

/// Stress at a radius, Pa, tension positive.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Stress {
    /// Radial stress.
    pub radial: f64,
    /// Hoop stress.
    pub hoop: f64,
}

impl RingSection {
    /// A ring of these radii (m), modulus (Pa), Poisson's ratio and density (kg/m³).
    ///
    /// # Errors
    /// Inner radius below zero or not below the outer, modulus not positive, Poisson's ratio outside (−1, 0.5),
    /// density below zero, anything not finite.
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

    /// Inner radius, m.
    pub fn inner_radius(&self) -> f64 {
        self.inner_radius
    }

    /// Outer radius, m.
    pub fn outer_radius(&self) -> f64 {
        self.outer_radius
    }

    /// Whether it has no bore.
    pub fn is_solid(&self) -> bool {
        self.inner_radius == 0.0
    }

    /// Young's modulus, Pa.
    pub fn youngs_modulus(&self) -> f64 {
        self.youngs_modulus
    }

    /// Poisson's ratio.
    pub fn poisson(&self) -> f64 {
        self.poisson
    }

    /// Density, kg/m³.
    pub fn density(&self) -> f64 {
        self.density
    }

    /// Stress at radius `r` (m).
    ///
    /// Source: Timoshenko & Goodier, *Theory of Elasticity*, §§ 28 and 32.
    ///
    /// # Errors
    /// A radius outside the ring, or a pressure on the inner face of a solid ring.
    pub fn stress_at(&self, load: &RingLoad, r: f64) -> Result<Stress, MechanicsError> {
        self.check_place(load, r)?;
        let (a2, b2) = (self.inner_radius.powi(2), self.outer_radius.powi(2));
        let centrifugal = self.density * load.angular_speed.powi(2) / 8.0;
        let nu = self.poisson;
        if self.is_solid() {
            let pressure = -load.outer_pressure;
            return Ok(Stress {
                radial: pressure + centrifugal * (3.0 + nu) * (b2 - r * r),
                hoop: pressure + centrifugal * ((3.0 + nu) * b2 - (1.0 + 3.0 * nu) * r * r),
            });
        }
        let mean = (load.inner_pressure * a2 - load.outer_pressure * b2) / (b2 - a2);
        let swing = (load.inner_pressure - load.outer_pressure) * a2 * b2 / ((b2 - a2) * r * r);
        let rotation = centrifugal * (3.0 + nu);
        let share = (1.0 + 3.0 * nu) / (3.0 + nu);
        Ok(Stress {
            radial: mean - swing + rotation * (a2 + b2 - a2 * b2 / (r * r) - r * r),
            hoop: mean + swing + rotation * (a2 + b2 + a2 * b2 / (r * r) - share * r * r),
        })
    }

    /// Radial displacement at radius `r` (m), from Hooke's law for the hoop strain.
    ///
    /// # Errors
    /// As [`Self::stress_at`].
    pub fn displacement_at(&self, load: &RingLoad, r: f64) -> Result<f64, MechanicsError> {
        let stress = self.stress_at(load, r)?;
        Ok(r * ((stress.hoop - self.poisson * stress.radial) / self.youngs_modulus + load.free_strain))
    }

    fn check_place(&self, load: &RingLoad, r: f64) -> Result<(), MechanicsError> {
        for value in [load.inner_pressure, load.outer_pressure, load.angular_speed, load.free_strain] {
            check("pressure, speed or strain on a ring", value, "finite", true)?;
        }
        let slack = 1e-9 * self.outer_radius;
        let inside = r >= self.inner_radius - slack && r <= self.outer_radius + slack;
        check("radius (m)", r, "within the ring", inside)?;
        let hollow = !self.is_solid() || load.inner_pressure == 0.0;
        check("pressure in a solid ring (Pa)", load.inner_pressure, "zero", hollow)
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
