//! One ring under the contact pressure alone: stress for each pascal of it.

use crate::findings::FaceStress;
use crate::joint::Ring;
use crate::material::Kind;
use crate::mechanics::MechanicsError;
use crate::mechanics::criteria::{self, DuctileCriterion};
use crate::mechanics::ring::{RingLoad, RingSection, Stress};

/// Stress of a ring at rest for each pascal of contact pressure, tension positive, and its strength.
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
    /// Equivalent stress that governs, by the criterion of its kind.
    pub equivalent: f64,
    /// Strength it is compared with, Pa; none when it is not known.
    pub strength: Option<f64>,
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
        let material = &ring.material;
        let section = RingSection::new(
            0.5 * ring.inner_diameter,
            0.5 * ring.outer_diameter,
            material.youngs_modulus.value,
            material.poisson.value,
            material.density.value,
        )?;
        let mut bore = section.stress_at(&load, section.inner_radius())?;
        let mut rim = section.stress_at(&load, section.outer_radius())?;
        // At a loaded face the radial stress is the pressure itself.
        if !section.is_solid() {
            bore.radial = -load.inner_pressure;
        }
        rim.radial = -load.outer_pressure;
        let greatest = |of: fn(f64, f64) -> f64| of(bore.radial, bore.hoop).max(of(rim.radial, rim.hoop));
        let (equivalent, strength) = match (material.kind, criterion) {
            (Kind::Brittle, _) => (greatest(criteria::greatest_principal), ring.strength.tensile_strength),
            (_, DuctileCriterion::VonMises) => (greatest(criteria::von_mises), ring.strength.yield_strength),
            (_, DuctileCriterion::Tresca) => (greatest(criteria::tresca), ring.strength.yield_strength),
        };
        Ok(Self {
            bore_radial: bore.radial,
            bore_hoop: bore.hoop,
            rim_radial: rim.radial,
            rim_hoop: rim.hoop,
            equivalent,
            strength,
        })
    }

    /// Strength over equivalent stress at a contact pressure (Pa).
    #[inline]
    pub fn safety(&self, pressure: f64) -> Option<f64> {
        let equivalent = self.equivalent * pressure;
        self.strength.filter(|_| equivalent > 0.0).map(|strength| strength / equivalent)
    }

    /// Contact pressure (Pa) at which the ring reaches its strength; none when nothing stresses it.
    pub fn pressure_at_strength(&self) -> Option<f64> {
        self.strength.filter(|_| self.equivalent > 0.0).map(|strength| strength / self.equivalent)
    }

    /// Stress and safety at a contact pressure (Pa).
    #[inline]
    pub fn values(&self, pressure: f64) -> RingValues {
        let face = |radial: f64, hoop: f64| {
            let stress = Stress { radial: radial * pressure + 0.0, hoop: hoop * pressure + 0.0 };
            FaceStress {
                radial: stress.radial,
                hoop: stress.hoop,
                von_mises: criteria::von_mises(stress.radial, stress.hoop),
                tresca: criteria::tresca(stress.radial, stress.hoop),
            }
        };
        RingValues {
            bore: face(self.bore_radial, self.bore_hoop),
            rim: face(self.rim_radial, self.rim_hoop),
            equivalent: self.equivalent * pressure,
            safety: self.safety(pressure),
        }
    }
}
