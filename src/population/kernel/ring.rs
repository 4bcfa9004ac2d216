//! One ring under the contact pressure alone: stress for each pascal of it.

use crate::findings::FaceStress;
use crate::joint::Ring;
use crate::material::Kind;
use crate::mechanics::MechanicsError;
use crate::mechanics::criteria::{self, DuctileCriterion};
use crate::mechanics::ring::{RingLoad, RingSection, Stress};
use crate::numerics::root::bracketed;

/// Stress of a ring for each pascal of contact pressure, tension positive, and its strength.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PlainRing {
    /// Radial stress at the bore, or at the centre of a solid ring.
    pub bore_radial: f64,
    /// Hoop stress there.
    pub bore_hoop: f64,
    /// Radial stress at the rim.
    pub rim_radial: f64,
    /// Hoop stress there.
    pub rim_hoop: f64,
    /// Equivalent stress that governs while only the contact acts, by the criterion of its kind.
    pub equivalent: f64,
    /// Strength it is compared with, Pa; none when it is not known.
    pub strength: Option<f64>,
    measure: Measure,
}

/// How the stress at a face is measured against the strength.
#[derive(Debug, Clone, Copy, PartialEq)]
enum Measure {
    Brittle { tension_share: f64 },
    VonMises,
    Tresca,
}

impl Measure {
    fn of(self, stress: Stress) -> f64 {
        match self {
            Self::Brittle { tension_share } => criteria::brittle(stress.radial, stress.hoop, tension_share),
            Self::VonMises => criteria::von_mises(stress.radial, stress.hoop),
            Self::Tresca => criteria::tresca(stress.radial, stress.hoop),
        }
    }
}

/// Stress of a ring without contact, by speed, pressure from outside and a gradient of temperature, Pa.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct RingBase {
    /// At the bore, or at the centre of a solid ring.
    pub bore: Stress,
    /// At the rim.
    pub rim: Stress,
    /// Whether both are zero.
    pub is_zero: bool,
}

impl Default for RingBase {
    fn default() -> Self {
        let zero = Stress { radial: 0.0, hoop: 0.0 };
        Self { bore: zero, rim: zero, is_zero: true }
    }
}

/// Stress and safety of a ring at one pressure, as in [`RingStress`](crate::findings::RingStress).
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct RingValues {
    /// Its inner face; the centre when it is solid.
    pub bore: FaceStress,
    /// Its outer face.
    pub rim: FaceStress,
    /// Equivalent stress that governs, Pa.
    pub equivalent: f64,
    /// Strength over equivalent stress; none when nothing stresses the ring or no strength is known.
    pub safety: Option<f64>,
}

impl PlainRing {
    /// The ring inside the interface: the pressure acts on its outer face.
    pub(super) fn inner(ring: &Ring, criterion: DuctileCriterion) -> Result<Self, MechanicsError> {
        Self::under(ring, criterion, RingLoad { outer_pressure: 1.0, ..RingLoad::default() })
    }

    /// The ring outside the interface: the pressure acts in its bore.
    pub(super) fn outer(ring: &Ring, criterion: DuctileCriterion) -> Result<Self, MechanicsError> {
        Self::under(ring, criterion, RingLoad { inner_pressure: 1.0, ..RingLoad::default() })
    }

    fn under(ring: &Ring, criterion: DuctileCriterion, load: RingLoad) -> Result<Self, MechanicsError> {
        // Stress by pressure does not depend on the modulus.
        let (unit, _) = base(ring, ring.material.youngs_modulus.value, &load, 0.5 * ring.outer_diameter)?;
        let measure = match (ring.material.kind, criterion) {
            (Kind::Brittle, _) => Measure::Brittle { tension_share: ring.tension_share() },
            (_, DuctileCriterion::VonMises) => Measure::VonMises,
            (_, DuctileCriterion::Tresca) => Measure::Tresca,
        };
        let strength = match ring.material.kind {
            Kind::Brittle => ring.strength.tensile_strength,
            Kind::Ductile | Kind::Polymer => ring.strength.yield_strength,
        };
        Ok(Self {
            bore_radial: unit.bore.radial,
            bore_hoop: unit.bore.hoop,
            rim_radial: unit.rim.radial,
            rim_hoop: unit.rim.hoop,
            equivalent: measure.of(unit.bore).max(measure.of(unit.rim)),
            strength,
            measure,
        })
    }

    /// Equivalent stress (Pa) that governs at a contact pressure (Pa).
    #[inline]
    pub fn equivalent_at(&self, pressure: f64, base: &RingBase) -> f64 {
        if base.is_zero {
            return self.equivalent * pressure;
        }
        let (bore, rim) = self.faces(pressure, base);
        self.measure.of(bore).max(self.measure.of(rim))
    }

    /// Strength over equivalent stress at a contact pressure (Pa); none when nothing stresses the ring.
    #[inline]
    pub fn safety(&self, pressure: f64, base: &RingBase) -> Option<f64> {
        let equivalent = self.equivalent_at(pressure, base);
        self.strength.filter(|_| equivalent > 0.0).map(|strength| strength / equivalent)
    }

    fn faces(&self, pressure: f64, base: &RingBase) -> (Stress, Stress) {
        let face = |radial: f64, hoop: f64, base: &Stress| Stress {
            radial: radial * pressure + base.radial,
            hoop: hoop * pressure + base.hoop,
        };
        (face(self.bore_radial, self.bore_hoop, &base.bore), face(self.rim_radial, self.rim_hoop, &base.rim))
    }

    /// Contact pressure (Pa) at which the ring reaches its strength while only the contact acts; none when it
    /// stresses nothing.
    pub fn pressure_at_strength(&self) -> Option<f64> {
        self.strength.filter(|_| self.equivalent > 0.0).map(|strength| strength / self.equivalent)
    }

    /// Contact pressure (Pa) above which the equivalent stress exceeds a stress (Pa), with what stresses the ring besides;
    /// below zero when that alone does. None when the contact stresses nothing, or a stress is not positive.
    ///
    /// The equivalent stress is convex in the pressure, so that it goes through the stress once on the way up.
    pub fn pressure_at_stress(&self, stress: f64, base: &RingBase) -> Option<f64> {
        if self.equivalent <= 0.0 || stress <= 0.0 {
            return None;
        }
        let alone = stress / self.equivalent;
        if base.is_zero {
            return Some(alone);
        }
        if self.equivalent_at(0.0, base) >= stress {
            return Some(-alone);
        }
        let excess = |pressure: f64| self.equivalent_at(pressure, base) - stress;
        let mut high = alone;
        // What is added beside is linear in the pressure: doubling passes it.
        for _ in 0..64 {
            if excess(high) > 0.0 {
                break;
            }
            high *= 2.0;
        }
        bracketed(excess, 0.0, high, 0.0).ok()
    }

    /// Stress and safety at a contact pressure (Pa).
    #[inline]
    pub fn values(&self, pressure: f64, base: &RingBase) -> RingValues {
        let face = |stress: Stress| FaceStress {
            radial: stress.radial,
            hoop: stress.hoop,
            von_mises: criteria::von_mises(stress.radial, stress.hoop),
            tresca: criteria::tresca(stress.radial, stress.hoop),
        };
        let (bore, rim) = self.faces(pressure, base);
        RingValues {
            bore: face(bore),
            rim: face(rim),
            equivalent: self.equivalent_at(pressure, base),
            safety: self.safety(pressure, base),
        }
    }
}

/// A ring with this Young's modulus, Pa.
pub(super) fn section(ring: &Ring, youngs_modulus: f64) -> Result<RingSection, MechanicsError> {
    let material = &ring.material;
    RingSection::new(
        0.5 * ring.inner_diameter,
        0.5 * ring.outer_diameter,
        youngs_modulus,
        material.poisson.value,
        material.density.value,
    )
}

/// Stress of a ring of this modulus (Pa) at both faces under a load, and its radial displacement (m) at a radius (m).
pub(super) fn base(
    ring: &Ring,
    youngs_modulus: f64,
    load: &RingLoad,
    radius: f64,
) -> Result<(RingBase, f64), MechanicsError> {
    let section = section(ring, youngs_modulus)?;
    let mut bore = section.stress_at(load, section.inner_radius())?;
    let mut rim = section.stress_at(load, section.outer_radius())?;
    // At a loaded face the radial stress is the pressure itself.
    if !section.is_solid() {
        bore.radial = 0.0 - load.inner_pressure;
    }
    rim.radial = 0.0 - load.outer_pressure;
    Ok((RingBase { bore, rim, is_zero: false }, section.displacement_at(load, radius)?))
}
