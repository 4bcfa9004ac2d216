//! A bearing seat as understood.

use crate::assembly::bearing::BearingKind;
use crate::assembly::bearing_tables::{BearingClass, BearingRing, ClearanceGroup};
use crate::material::Sourced;
use crate::tolerance::{Limits, Member};

/// A rolling bearing of which one ring is a part of the joint.
#[derive(Debug, Clone, PartialEq)]
pub struct BearingSeat {
    /// The ring that is fitted: the inner one on a shaft, the outer one in a housing.
    pub ring: BearingRing,
    /// Kind of bearing.
    pub kind: BearingKind,
    /// Bore, m.
    pub bore: f64,
    /// Outside diameter, m.
    pub outside_diameter: f64,
    /// Width of the ring, m.
    pub width: f64,
    /// Group of radial internal clearance.
    pub clearance: ClearanceGroup,
    /// Tolerance class.
    pub class: BearingClass,
    /// Raceway diameter of the inner ring, m.
    pub inner_raceway: f64,
    /// Raceway diameter of the outer ring, m.
    pub outer_raceway: f64,
    /// Limits of the fitted surface from nominal, m.
    pub limits: Sourced<Limits>,
    /// How much warmer the inner ring runs than the outer in states above the shop temperature, K.
    pub inner_hotter_by: Sourced<f64>,
}

impl BearingSeat {
    /// Diameter of the seat, m: the bore of an inner ring, the outside diameter of an outer one.
    pub fn diameter(&self) -> f64 {
        match self.ring {
            BearingRing::Inner => self.bore,
            BearingRing::Outer => self.outside_diameter,
        }
    }

    /// Raceway diameter of the fitted ring, m.
    pub fn raceway(&self) -> f64 {
        match self.ring {
            BearingRing::Inner => self.inner_raceway,
            BearingRing::Outer => self.outer_raceway,
        }
    }

    /// The member of the fit that the ring is: an inner ring is the hole, an outer one the shaft.
    pub fn member(&self) -> Member {
        match self.ring {
            BearingRing::Inner => Member::Hole,
            BearingRing::Outer => Member::Shaft,
        }
    }

    /// Index of the fitted ring among the rings of the joint.
    pub fn index(&self) -> usize {
        match self.ring {
            BearingRing::Inner => 1,
            BearingRing::Outer => 0,
        }
    }

    /// What the fitted ring is called.
    pub fn ring_name(&self) -> &'static str {
        match self.ring {
            BearingRing::Inner => "inner ring",
            BearingRing::Outer => "outer ring",
        }
    }
}
