//! A stepped hub or shaft, disc by disc.

use super::capacity;
use super::error::MechanicsError;
use super::ring::check;
use super::two_rings::TwoRings;

/// How much finite elements lie above (positive) or below the sum of the slices in grip, least and greatest of three
/// stepped hubs.
///
/// Axisymmetric finite elements computed for this program and worked again in its tests: d = 50 mm, frictionless,
/// solid shaft, hubs of two and three steps with D/d of 1.4 to 2.2, shaft standing out or flush.
pub const TOTAL_DEVIATION: (f64, f64) = (0.003, 0.023);

/// How much finite elements lie above (positive) or below a single slice in pressure, of the same hubs.
///
/// A thin end flange beside a thick web carries more than its slice says, the web less: slices are indicative.
pub const SLICE_DEVIATION: (f64, f64) = (-0.083, 0.137);

/// A disc of the joint.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Slice {
    /// Hub and shaft over this length.
    pub rings: TwoRings,
    /// Length l, m.
    pub length: f64,
}

/// What the slices carry.
#[derive(Debug, Clone, PartialEq)]
pub struct SlicedGrip {
    /// Contact pressure of each slice, Pa.
    pub pressures: Vec<f64>,
    /// Torque at slip, N·m.
    pub torque: f64,
    /// Axial force at slip, N.
    pub axial_force: f64,
}

/// Pressure of every slice and the grip of all.
///
/// T = Σ μ_c pᵢ π d² lᵢ/2, F = Σ μ_a pᵢ π d lᵢ
///
/// pᵢ pressure of slice i by [`TwoRings::pressure`] of its own diameters (Pa), lᵢ its length (m), d joint diameter (m),
/// μ_c, μ_a coefficient of friction round and along the joint.
///
/// Every slice is taken as if it stood alone. Totals are good to a few per cent and slices to 10 to 15 %
/// ([`TOTAL_DEVIATION`], [`SLICE_DEVIATION`]); each slice must be elastic. Source: equilibrium; Lamé for each slice.
///
/// # Errors
/// No slice, slices of different joint diameters, a length that is not positive, friction below zero, and as
/// [`TwoRings::pressure`].
///
/// # Example
/// ```
/// use hubgrip::mechanics::{slices::{Slice, sliced_grip}, two_rings::TwoRings};
/// let thin = TwoRings {
///     diameter: 0.05,
///     hub_outer_diameter: 0.075,
///     shaft_bore: 0.0,
///     hub_youngs_modulus: 200e9,
///     hub_poisson: 0.3,
///     shaft_youngs_modulus: 200e9,
///     shaft_poisson: 0.3,
/// };
/// let thick = TwoRings { hub_outer_diameter: 0.1, shaft_bore: 0.02, ..thin };
/// let slices = [Slice { rings: thin, length: 0.02 }, Slice { rings: thick, length: 0.02 }];
/// let grip = sliced_grip(&slices, 50e-6, 0.12, 0.12).unwrap();
/// assert!((grip.torque - 1142.09983).abs() < 1e-5);
/// ```
pub fn sliced_grip(
    slices: &[Slice],
    interference: f64,
    friction_round: f64,
    friction_along: f64,
) -> Result<SlicedGrip, MechanicsError> {
    check("number of slices", slices.len() as f64, "one or more", !slices.is_empty())?;
    for friction in [friction_round, friction_along] {
        check("coefficient of friction", friction, "zero or more", friction >= 0.0)?;
    }
    let mut grip = SlicedGrip { pressures: Vec::with_capacity(slices.len()), torque: 0.0, axial_force: 0.0 };
    for Slice { rings, length } in slices {
        let diameter = rings.diameter;
        check("slice length (m)", *length, "positive", *length > 0.0)?;
        let same = (diameter - slices[0].rings.diameter).abs() <= 1e-9 * diameter;
        check("joint diameter of a slice (m)", diameter, "that of the others", same)?;
        let pressure = rings.pressure(interference)?;
        grip.torque += capacity::torque(friction_round, pressure, diameter, *length);
        grip.axial_force += capacity::axial(friction_along, pressure, diameter, *length);
        grip.pressures.push(pressure);
    }
    Ok(grip)
}
