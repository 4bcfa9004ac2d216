//! Bending moment and radial force on a joint: edge pressure, and the moment at which the edge gaps.

use std::f64::consts::PI;

use super::error::MechanicsError;
use super::ring::check;

/// Share of the limiting moment recommended under rotating bending. Common practice, no source: micro-slip and
/// fretting at the edge start well before it gaps.
pub const ROTATING_BENDING_SHARE: f64 = 0.5;

/// A joint under bending; lengths m.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct BentJoint {
    /// Joint diameter d, m.
    pub diameter: f64,
    /// Joint length L, m.
    pub length: f64,
    /// Contact pressure p without bending, Pa.
    pub pressure: f64,
}

impl BentJoint {
    /// Rise of the contact pressure at one edge (and fall at the other side), Pa.
    ///
    /// Δp = 12 M/(π d L²) + 2 Fr/(π d L)
    ///
    /// M bending moment about the middle of the length (N·m), Fr radial force at the middle of the length (N), d
    /// joint diameter (m), L joint length (m).
    ///
    /// A stiff hub on a stiff shaft: the pressure changes linearly along the length and with the cosine round the
    /// joint, and carries the loads without friction. The bending of hub and shaft themselves is left out, which
    /// in truth loads the edges more. Holds while Δp ≤ p, so that the edge does not gap; the mean pressure, and with
    /// it the torque and the axial force at slip, stay as they are.
    ///
    /// Source: equilibrium of that distribution, Δp cos φ (2x/L): ∫ gives M = π d L² Δp/12 and Fr = π d L Δp/2.
    ///
    /// # Errors
    /// A diameter or length that is not positive, a pressure below zero, a load below zero or not finite.
    ///
    /// # Example
    /// ```
    /// use hubgrip::mechanics::bending::BentJoint;
    /// let joint = BentJoint { diameter: 0.05, length: 0.04, pressure: 75e6 };
    /// assert!((joint.edge_pressure_rise(400.0, 3000.0).unwrap() - 20.0535228e6).abs() < 1.0);
    /// ```
    pub fn edge_pressure_rise(&self, moment: f64, radial_force: f64) -> Result<f64, MechanicsError> {
        self.check()?;
        check("bending moment (N·m)", moment, "zero or more", moment >= 0.0)?;
        Ok(moment / self.moment_per_pressure() + self.rise_by_force(radial_force)?)
    }

    /// Bending moment at which the edge gaps, N·m; zero where the radial force alone gaps it.
    ///
    /// M = (p − 2 Fr/(π d L)) π d L²/12
    ///
    /// Symbols, validity and source as in [`Self::edge_pressure_rise`]; p contact pressure (Pa).
    ///
    /// # Errors
    /// As [`Self::edge_pressure_rise`].
    ///
    /// # Example
    /// ```
    /// use hubgrip::mechanics::bending::BentJoint;
    /// let joint = BentJoint { diameter: 0.05, length: 0.04, pressure: 75e6 };
    /// assert!((joint.limiting_moment(3000.0).unwrap() - 1550.79633).abs() < 1e-5);
    /// ```
    pub fn limiting_moment(&self, radial_force: f64) -> Result<f64, MechanicsError> {
        self.check()?;
        let left = self.pressure - self.rise_by_force(radial_force)?;
        Ok(left.max(0.0) * self.moment_per_pressure())
    }

    /// Bending moment recommended under rotating bending, N·m: [`ROTATING_BENDING_SHARE`] of the limiting moment.
    ///
    /// A recommendation, not a limit: common practice, no source.
    ///
    /// # Errors
    /// As [`Self::limiting_moment`].
    pub fn recommended_moment(&self, radial_force: f64) -> Result<f64, MechanicsError> {
        Ok(ROTATING_BENDING_SHARE * self.limiting_moment(radial_force)?)
    }

    /// π d L²/12, m³.
    fn moment_per_pressure(&self) -> f64 {
        PI * self.diameter * self.length.powi(2) / 12.0
    }

    fn rise_by_force(&self, radial_force: f64) -> Result<f64, MechanicsError> {
        check("radial force (N)", radial_force, "zero or more", radial_force >= 0.0)?;
        Ok(2.0 * radial_force / (PI * self.diameter * self.length))
    }

    fn check(&self) -> Result<(), MechanicsError> {
        check("joint diameter (m)", self.diameter, "positive", self.diameter > 0.0)?;
        check("joint length (m)", self.length, "positive", self.length > 0.0)?;
        check("contact pressure (Pa)", self.pressure, "zero or more", self.pressure >= 0.0)
    }
}
