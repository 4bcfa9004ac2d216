//! Where the thick-walled cylinder is off: a hub of finite length on a longer shaft, and its edges.

use super::error::MechanicsError;
use super::ring::check;
use crate::numerics::interpolation::MonotoneCubic;

/// Length of the joint over its diameter, of the rows below.
const SLENDERNESS: [f64; 4] = [0.25, 0.5, 1.0, 2.0];
/// Joint diameter over outer diameter of the hub, of the columns below.
const DIAMETER_RATIO: [f64; 3] = [0.3, 0.5, 0.7];

/// Mean pressure over that of the thick-walled cylinder, to the digits shown. Axisymmetric finite elements computed
/// for this program and worked again in `tests/finite_elements`: frictionless, one material with ν = 0.3, solid shaft
/// standing out on both sides.
const MEAN_PRESSURE: [[f64; 3]; 4] =
    [[1.122, 1.099, 1.065], [1.061, 1.050, 1.033], [1.029, 1.024, 1.015], [1.014, 1.012, 1.007]];
/// Mean pressure over the last 0.02 d at the edge over that of the thick-walled cylinder, to 0.5 %; computed with
/// the table above.
const EDGE_PRESSURE: [[f64; 3]; 4] =
    [[1.61, 1.57, 1.52], [1.68, 1.66, 1.55], [1.69, 1.65, 1.48], [1.68, 1.62, 1.48]];

/// Where the shaft ends.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum ShaftEnds {
    /// Flush with the hub on both sides.
    Flush,
    /// Standing out on both sides. An overhang of 0.05 d already has 61 to 64 % of the effect on the mean pressure
    /// (finite elements, as the factors).
    Through,
}

/// Pressures over that of the thick-walled cylinder.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct LengthFactors {
    /// Mean pressure over the length.
    pub mean_pressure: f64,
    /// Mean pressure over the last 0.02 d at a sharp edge. The edge is singular in theory, so this depends on the
    /// band it is taken over and on the radius of the corner: a warning, never a stress to be printed.
    pub edge_pressure: f64,
}

/// Mean and edge pressure of a hub of finite length over the pressure of the thick-walled cylinder.
///
/// f = 1 + e^y, y a monotone cubic in Q and in ln(L/d) through the computed ln(f − 1)
///
/// `slenderness` joint length over joint diameter L/d, 0.25 to 2; `diameter_ratio` joint diameter over outer diameter
/// of the hub Q, 0.3 to 0.7.
///
/// A shaft that stands out supports the edges of its hub: the mean pressure rises by 1 to 12 %, that at the edge
/// to 1.5 to 1.7 times, and for L/d ≤ 0.5 that at mid-length lies 4 to 9 % below the thick-walled cylinder. A
/// shaft that ends flush with its hub has exactly the pressure of the thick-walled cylinder.
///
/// Holds for one material with ν = 0.3, a solid shaft, an elastic joint without axial friction. Where the seat of one
/// material does not slip lengthwise at all, the pressure of a long joint rises towards 1/(1 − ν²), +9.9 %; real joints
/// lie between. Source: axisymmetric finite elements computed for this program and worked again in its tests.
///
/// # Errors
/// A ratio outside the computed range.
///
/// # Example
/// ```
/// use hubgrip::mechanics::finite_length::{ShaftEnds, length_factors};
/// let factors = length_factors(0.5, 0.5, ShaftEnds::Through).unwrap();
/// assert!((factors.mean_pressure - 1.050).abs() < 1e-12);
/// assert!(length_factors(0.1, 0.5, ShaftEnds::Through).is_err());
/// ```
pub fn length_factors(
    slenderness: f64,
    diameter_ratio: f64,
    ends: ShaftEnds,
) -> Result<LengthFactors, MechanicsError> {
    check("joint length over diameter", slenderness, "0.25 to 2", (0.25..=2.0).contains(&slenderness))?;
    let thick_enough = (0.3..=0.7).contains(&diameter_ratio);
    check("joint diameter over outer diameter", diameter_ratio, "0.3 to 0.7", thick_enough)?;
    Ok(match ends {
        ShaftEnds::Flush => LengthFactors { mean_pressure: 1.0, edge_pressure: 1.0 },
        ShaftEnds::Through => LengthFactors {
            mean_pressure: interpolated(&MEAN_PRESSURE, slenderness, diameter_ratio)?,
            edge_pressure: interpolated(&EDGE_PRESSURE, slenderness, diameter_ratio)?,
        },
    })
}

fn interpolated(table: &[[f64; 3]; 4], slenderness: f64, diameter_ratio: f64) -> Result<f64, MechanicsError> {
    let mut along = Vec::with_capacity(table.len());
    for (length, row) in SLENDERNESS.iter().zip(table) {
        let excess = row.map(|factor| (factor - 1.0).ln());
        along.push((length.ln(), curve(&DIAMETER_RATIO, &excess, diameter_ratio)?));
    }
    let excess = MonotoneCubic::new(&along)?.value(slenderness.ln())?;
    Ok(1.0 + excess.exp())
}

fn curve(arguments: &[f64], values: &[f64], at: f64) -> Result<f64, MechanicsError> {
    let points: Vec<(f64, f64)> = arguments.iter().copied().zip(values.iter().copied()).collect();
    Ok(MonotoneCubic::new(&points)?.value(at)?)
}
