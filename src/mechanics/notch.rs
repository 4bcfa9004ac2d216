//! Fatigue notch factors of a shaft at the edge of a press-fitted hub.
//!
//! The edge is where shafts with press fits break in rotating bending: the fatigue strength there is that of the plain
//! shaft over the notch factor. These are published figures to be set beside the joint, not a fatigue calculation.

use super::error::MechanicsError;
use super::ring::check;

/// Diameter to which the formulas of DIN 743-2 refer, m.
pub const REFERENCE_DIAMETER: f64 = 0.040;

/// Fatigue notch factor in bending at the edge of a press fit.
///
/// β = 2.7 (R_m/1000 MPa)^0.43
///
/// R_m tensile strength of the shaft (Pa), 400 to 1200 MPa. Holds for a plain edge and a shaft of 40 mm
/// ([`REFERENCE_DIAMETER`]); for other sizes the standard corrects it. Source: DIN 743-2:2000, table of notch factors,
/// from memory.
///
/// # Errors
/// A tensile strength outside 400 to 1200 MPa.
///
/// # Example
/// ```
/// let factor = hubgrip::mechanics::notch::press_fit_bending(600e6).unwrap();
/// assert!((factor - 2.17).abs() < 0.005);
/// ```
pub fn press_fit_bending(tensile_strength: f64) -> Result<f64, MechanicsError> {
    Ok(2.7 * per_thousand(tensile_strength)?.powf(0.43))
}

/// Fatigue notch factor in torsion at the edge of a press fit, 0.65 of that in bending.
///
/// Symbols and validity as in [`press_fit_bending`]. Source: DIN 743-2:2000, from memory. Tests of a shrink-fitted
/// shaft gave 1.28 (paper of the Japan Society of Mechanical Engineers, *Torsional Fatigue Strength of a Shrink
/// Fitted Shaft*, abstract), below this.
///
/// # Errors
/// As [`press_fit_bending`].
pub fn press_fit_torsion(tensile_strength: f64) -> Result<f64, MechanicsError> {
    Ok(0.65 * press_fit_bending(tensile_strength)?)
}

/// Fatigue notch factor in bending at a parallel key seat, to compare with.
///
/// β = 3.0 (R_m/1000 MPa)^0.38
///
/// Symbols and validity as in [`press_fit_bending`]. Source: DIN 743-2:2000, from memory.
///
/// # Errors
/// As [`press_fit_bending`].
pub fn key_seat_bending(tensile_strength: f64) -> Result<f64, MechanicsError> {
    Ok(3.0 * per_thousand(tensile_strength)?.powf(0.38))
}

/// Fatigue notch factor in torsion at a parallel key seat, 0.56 of that in bending and 0.1.
///
/// Symbols and validity as in [`press_fit_bending`]. Source: DIN 743-2:2000, from memory.
///
/// # Errors
/// As [`press_fit_bending`].
pub fn key_seat_torsion(tensile_strength: f64) -> Result<f64, MechanicsError> {
    Ok(0.56 * key_seat_bending(tensile_strength)? + 0.1)
}

/// A published fatigue notch factor or the band it is published as.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PublishedNotchFactor {
    /// Shaft, hub edge and load.
    pub case: &'static str,
    /// Lower end of the band.
    pub low: f64,
    /// Upper end of the band; the same as the lower where one figure is given.
    pub high: f64,
    /// Where it is published, and whether it is told from memory.
    pub source: &'static str,
}

const PETERSON: &str = "Peterson / Pilkey, Stress Concentration Factors, press-fitted members; from memory";

/// Notch factors in rotating bending from tests on shafts of about 2 in.
pub const MEASURED_IN_BENDING: [PublishedNotchFactor; 6] = [
    PublishedNotchFactor {
        case: "2 in axle with a pressed member, reversed bending",
        low: 2.0,
        high: 3.0,
        source: "Horger & Maulbetsch, J. Applied Mechanics 3 (1936) A91-A98, abstract: strength falls to one half \
                 to one third",
    },
    PublishedNotchFactor {
        case: "plain hub edge, carbon steel axle, no load through the hub",
        low: 2.0,
        high: 2.0,
        source: PETERSON,
    },
    PublishedNotchFactor {
        case: "plain hub edge, alloy steel axle (about 310 HB), no load through the hub",
        low: 2.3,
        high: 2.3,
        source: PETERSON,
    },
    PublishedNotchFactor {
        case: "plain hub edge, carbon steel axle, load through the hub",
        low: 2.3,
        high: 2.3,
        source: PETERSON,
    },
    PublishedNotchFactor {
        case: "plain hub edge, alloy to high-strength steel axle, load through the hub",
        low: 2.9,
        high: 3.9,
        source: PETERSON,
    },
    PublishedNotchFactor {
        case: "raised seat with fillet, hub overhanging it, or relief groove",
        low: 1.3,
        high: 1.4,
        source: PETERSON,
    },
];

/// Tensile strength over 1000 MPa, within the range of the table.
fn per_thousand(tensile_strength: f64) -> Result<f64, MechanicsError> {
    let inside = (400e6..=1200e6).contains(&tensile_strength);
    check("tensile strength (Pa)", tensile_strength, "400 to 1200 MPa", inside)?;
    Ok(tensile_strength / 1e9)
}
