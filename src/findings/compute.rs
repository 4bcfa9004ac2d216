//! From a joint to its findings, in one pass.

use thiserror::Error;

use super::condition::Condition;
use super::kernel::{Kernel, PairInterference, pair_interferences};
use super::softening::Parts;
use super::times::Extent;
use super::{
    DutyFindings, Findings, OnsetOfYield, PairFindings, Verdict, assembly_of, bearing_of, cautions, earlier,
    oil, service, softening, verdicts,
};
use crate::assembly::AssemblyError;
use crate::joint::{Allow, Joint};
use crate::mechanics::MechanicsError;
use crate::numerics::interpolation::InterpolationError;
use crate::numerics::root::RootError;
use crate::tolerance::{Character, Extremes};

/// Why the findings of a valid joint could not be computed.
#[derive(Debug, Clone, PartialEq, Error)]
pub enum FindingsError {
    /// A joint needs two rings or more, and a fit between each two neighbours.
    #[error("a joint of {rings} rings and {fits} fits is incomplete: each two neighbours need one fit")]
    Incomplete {
        /// Number of rings.
        rings: usize,
        /// Number of fits.
        fits: usize,
    },
    /// A formula was asked for something outside its validity.
    #[error(transparent)]
    Mechanics(#[from] MechanicsError),
    /// An assembly formula was asked for something outside its validity.
    #[error(transparent)]
    Assembly(#[from] AssemblyError),
    /// A root was not found.
    #[error(transparent)]
    Root(#[from] RootError),
    /// A temperature lies outside the curve of Young's modulus of a material.
    #[error("the curve of Young's modulus of {material} does not reach the temperature asked for: {cause}")]
    Modulus {
        /// Name of the material.
        material: String,
        /// The range and the temperature.
        cause: InterpolationError,
    },
    /// A temperature lies outside the expansion curve of a material.
    #[error("the expansion curve of {material} does not reach the temperature asked for: {cause}")]
    Expansion {
        /// Name of the material.
        material: String,
        /// The range and the temperature.
        cause: InterpolationError,
    },
}

/// Share of the pressure that counts at the tightest pair: all of it, as on the first day.
pub(super) const FRESH: f64 = 1.0;

/// Computes everything about a joint.
///
/// # Errors
/// [`FindingsError`] when a formula would be used outside its validity; a joint that has clearance,
/// slips or yields is a result, not an error.
pub fn compute(joint: Joint) -> Result<Findings, FindingsError> {
    if joint.rings.len() < 2 || joint.fits.len() + 1 != joint.rings.len() {
        return Err(FindingsError::Incomplete { rings: joint.rings.len(), fits: joint.fits.len() });
    }
    let kernel = Kernel::new(&joint)?;
    let mut pairs = pair_interferences(&joint);
    let mut extremes = extremes(&kernel, &pairs)?;
    let mut duty = joint
        .duty
        .iter()
        .map(|state| {
            Ok(DutyFindings {
                youngs_moduli: Condition::of_state(&joint, state)?.youngs_moduli(&joint)?,
                loosest: kernel.state(state, &pairs.loosest, state.relaxation)?,
                tightest: kernel.state(state, &pairs.tightest, FRESH)?,
            })
        })
        .collect::<Result<Vec<_>, FindingsError>>()?;
    let onset_of_yield = onset_of_yield(&joint, &kernel)?;
    let mut plastic = service::plastic(&joint, &kernel, &pairs)?;
    if let (Allow::Plastic { .. }, Some(plastic)) = (joint.require.allow, &mut plastic) {
        let mut parts = Parts { pairs: &mut pairs, extremes: &mut extremes, duty: &mut duty };
        softening::soften(&joint, &kernel, plastic, &mut parts)?;
    }
    let service = service::service(&joint, &kernel, &pairs, &extremes.tightest, &duty, plastic)?;
    let mut assembly = assembly_of::assembly(&joint, &extremes, Extent::Whole)?;
    assembly.earlier = earlier::earlier(&joint, &service.steps)?;
    assembly.oil = oil::oil(&joint, &kernel, &pairs, &extremes, service.plastic.as_ref())?;
    let character =
        joint.fits.get(joint.last_interface()).map_or(Character::Clearance, |fit| fit.limits.character());
    let bearing = bearing_of::bearing(&joint, &extremes, &duty, &assembly)?;
    let mut findings = Findings {
        joint,
        character,
        extremes,
        duty,
        service,
        assembly,
        bearing,
        onset_of_yield,
        verdicts: Vec::new(),
        cautions: Vec::new(),
        notes: Vec::new(),
    };
    findings.verdicts = verdicts::verdicts(&findings);
    findings.cautions = cautions::cautions(&findings);
    findings.notes = cautions::notes(&findings);
    Ok(findings)
}

/// The three pairs at the shop temperature.
fn extremes(
    kernel: &Kernel<'_>,
    pairs: &Extremes<PairInterference>,
) -> Result<Extremes<PairFindings>, FindingsError> {
    Ok(Extremes {
        loosest: kernel.pair(&pairs.loosest)?,
        mean: kernel.pair(&pairs.mean)?,
        tightest: kernel.pair(&pairs.tightest)?,
    })
}

/// The verdict on the time from oven or bath to seated alone, of an elastic joint: that of [`compute`] without what else it
/// works out. None where the method has no such time.
pub(crate) fn seating_verdict(joint: &Joint) -> Result<Option<Verdict>, FindingsError> {
    let kernel = Kernel::new(joint)?;
    let pairs = pair_interferences(joint);
    let extremes = extremes(&kernel, &pairs)?;
    let assembly = assembly_of::assembly(joint, &extremes, Extent::Seating)?;
    Ok(verdicts::handling(joint, &assembly.times))
}

/// Onset of yield (or fracture) at the shop temperature, at rest: every stress is linear in the pressure.
///
/// With more than two rings, or a stepped joint, there is no one interference at which yield starts.
fn onset_of_yield(joint: &Joint, kernel: &Kernel<'_>) -> Result<Option<OnsetOfYield>, FindingsError> {
    if joint.rings.len() != 2 || !joint.slices.is_empty() {
        return Ok(None);
    }
    let unit = joint.diameter * 1e-3;
    let (pressure, stresses) = kernel.cold(&[unit])?;
    let onset = stresses
        .iter()
        .enumerate()
        .filter_map(|(ring, stress)| Some((ring, stress.safety? * pressure)))
        .min_by(|a, b| a.1.total_cmp(&b.1));
    let strain = |ring: usize| kernel.shop.strain.get(ring).copied().unwrap_or(0.0);
    let by_temperature = (strain(0) - strain(1)) * joint.diameter;
    Ok(onset.map(|(ring, onset_pressure)| OnsetOfYield {
        ring,
        pressure: onset_pressure,
        interference: unit * onset_pressure / pressure - by_temperature,
    }))
}
