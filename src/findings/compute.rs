//! From a joint to its findings: extremes, mechanics, duty, in one pass.

use thiserror::Error;

use super::{
    DutyFindings, FaceStress, Findings, OnsetOfYield, PairFindings, RingStress, StateFindings, assembly_of,
    cautions, verdicts, worksheet,
};
use crate::assembly::AssemblyError;
use crate::assembly::press;
use crate::joint::{DutyState, Joint, Ring, SmoothingAt};
use crate::material::{Kind, Range};
use crate::mechanics::MechanicsError;
use crate::mechanics::capacity;
use crate::mechanics::criteria::{self, DuctileCriterion};
use crate::mechanics::ring::{RingLoad, RingSection, Stress};
use crate::mechanics::stack::{Stack, StackSolution};
use crate::numerics::interpolation::InterpolationError;
use crate::tolerance::Extremes;

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
    /// A temperature lies outside the expansion curve of a material.
    #[error("the expansion curve of {material} does not reach the temperature asked for: {cause}")]
    Expansion {
        /// Name of the material.
        material: String,
        /// The range and the temperature.
        cause: InterpolationError,
    },
}

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
    let pairs = pair_interferences(&joint);
    let extremes = Extremes {
        loosest: kernel.pair(&pairs.loosest)?,
        mean: kernel.pair(&pairs.mean)?,
        tightest: kernel.pair(&pairs.tightest)?,
    };
    let duty = joint
        .duty
        .iter()
        .map(|state| {
            Ok(DutyFindings {
                loosest: kernel.state(state, &pairs.loosest)?,
                tightest: kernel.state(state, &pairs.tightest)?,
            })
        })
        .collect::<Result<Vec<_>, FindingsError>>()?;
    let onset_of_yield = kernel.onset_of_yield()?;
    let assembly = assembly_of::assembly(&joint, &extremes)?;
    let character =
        joint.fits.first().map_or(crate::tolerance::Character::Clearance, |fit| fit.limits.character());
    let mut findings = Findings {
        joint,
        character,
        extremes,
        duty,
        assembly,
        onset_of_yield,
        verdicts: Vec::new(),
        worksheet: Vec::new(),
        cautions: Vec::new(),
        notes: Vec::new(),
    };
    findings.verdicts = verdicts::verdicts(&findings);
    findings.cautions = cautions::cautions(&findings);
    findings.notes = cautions::notes(&findings);
    findings.worksheet = worksheet::worksheet(&findings);
    Ok(findings)
}

/// Interference of one pair at each interface: as made, lost, left to grip.
#[derive(Debug, Clone, PartialEq)]
struct PairInterference {
    made: Vec<f64>,
    lost: Vec<f64>,
    effective: Vec<f64>,
    smoothed: Vec<f64>,
}

/// The three pairs with the smoothing loss taken where the joint says.
fn pair_interferences(joint: &Joint) -> Extremes<PairInterference> {
    let at = joint.smoothing.at;
    let pair = |pick: fn(Extremes<f64>) -> f64, is_tightest: bool| {
        let takes_loss = match at {
            SmoothingAt::Loosest => !is_tightest,
            SmoothingAt::Both => true,
            SmoothingAt::None => false,
        };
        let made: Vec<f64> = joint.fits.iter().map(|fit| pick(fit.limits.interference())).collect();
        let smoothed: Vec<f64> = made
            .iter()
            .zip(&joint.smoothing.loss)
            .map(|(made, loss)| after_smoothing(*made, *loss))
            .collect();
        let effective = if takes_loss { smoothed.clone() } else { made.clone() };
        let lost = made.iter().zip(&effective).map(|(made, effective)| made - effective).collect();
        PairInterference { made, lost, effective, smoothed }
    };
    Extremes {
        loosest: pair(|interference| interference.loosest, false),
        mean: pair(|interference| interference.mean, false),
        tightest: pair(|interference| interference.tightest, true),
    }
}

/// Interference left after the peaks have flattened: a clearance loses nothing, a grip never turns into one.
///
/// The loss is that of DIN 7190, U − G; that it stops at zero follows from contact ending there.
pub fn after_smoothing(interference: f64, loss: f64) -> f64 {
    if interference <= 0.0 { interference } else { (interference - loss).max(0.0) }
}

/// What stays the same from pair to pair.
struct Kernel<'a> {
    joint: &'a Joint,
    sections: Vec<RingSection>,
    shop_strain: Vec<f64>,
    engaged: f64,
}

impl<'a> Kernel<'a> {
    fn new(joint: &'a Joint) -> Result<Self, FindingsError> {
        let sections = joint.rings.iter().map(section).collect::<Result<Vec<_>, _>>()?;
        let temperatures = vec![joint.assembly.shop_temperature; joint.rings.len()];
        Ok(Self {
            joint,
            sections,
            shop_strain: free_strains(joint, &temperatures)?,
            engaged: joint.engaged_length(),
        })
    }

    fn solve(
        &self,
        interference: &[f64],
        free_strain: &[f64],
    ) -> Result<(Stack, StackSolution), MechanicsError> {
        let stack = Stack {
            rings: self.sections.clone(),
            interference: interference.to_vec(),
            free_strain: free_strain.to_vec(),
            ..Stack::default()
        };
        let solution = stack.solve()?;
        Ok((stack, solution))
    }

    /// Contact pressure at the interface that the torque passes through.
    fn pressure(&self, interference: &[f64], free_strain: &[f64]) -> Result<f64, MechanicsError> {
        Ok(grip(&self.solve(interference, free_strain)?.1))
    }

    fn pair(&self, pair: &PairInterference) -> Result<PairFindings, FindingsError> {
        let (stack, solution) = self.solve(&pair.effective, &self.shop_strain)?;
        let pressure = grip(&solution);
        let friction = &self.joint.friction;
        let capacity = self.capacity(pressure, friction.holding.value.low);
        let peak = |friction: f64| {
            let input = assembly_of::press_input(self.joint, pressure, first(&pair.effective), friction);
            press::peak_force(&input)
        };
        let release = |friction: f64| capacity::axial(friction, pressure, self.joint.diameter, self.engaged);
        Ok(PairFindings {
            interference: first(&pair.made),
            smoothing: first(&pair.lost),
            effective_interference: first(&pair.effective),
            pressure,
            pressure_smoothed: self.pressure(&pair.smoothed, &self.shop_strain)?,
            pressure_unsmoothed: self.pressure(&pair.made, &self.shop_strain)?,
            rings: self.stresses(&stack, &solution)?,
            torque_capacity: capacity.torque,
            axial_capacity: capacity.axial,
            press_force: Range {
                low: peak(friction.pressing.value.low)?,
                high: peak(friction.pressing.value.high)?,
            },
            release_force: Range {
                low: release(friction.release.value.low),
                high: release(friction.release.value.high),
            },
        })
    }

    fn state(&self, state: &DutyState, pair: &PairInterference) -> Result<StateFindings, FindingsError> {
        let strain = free_strains(self.joint, &state.temperatures)?;
        let (stack, solution) = self.solve(&pair.effective, &strain)?;
        let pressure = grip(&solution);
        let capacity = self.capacity(pressure, self.joint.friction.holding.value.low);
        Ok(StateFindings {
            pressure,
            torque_capacity: capacity.torque,
            axial_capacity: capacity.axial,
            slip_safety: slip_safety(state, &capacity),
            rings: self.stresses(&stack, &solution)?,
        })
    }

    fn capacity(&self, pressure: f64, friction: f64) -> Capacity {
        let axial = capacity::axial(friction, pressure, self.joint.diameter, self.engaged);
        Capacity { axial, torque: capacity::torque(friction, pressure, self.joint.diameter, self.engaged) }
    }

    fn stresses(&self, stack: &Stack, solution: &StackSolution) -> Result<Vec<RingStress>, FindingsError> {
        self.joint
            .rings
            .iter()
            .zip(&self.sections)
            .enumerate()
            .map(|(index, (ring, section))| {
                let load = stack.ring_load(index, solution)?;
                Ok(ring_stress(ring, section, &load, self.joint.criterion)?)
            })
            .collect()
    }

    /// Onset of yield (or fracture) at the shop temperature, at rest: every stress is linear in the pressure.
    ///
    /// With more than two rings there is no one interference at which yield starts.
    fn onset_of_yield(&self) -> Result<Option<OnsetOfYield>, FindingsError> {
        if self.sections.len() != 2 {
            return Ok(None);
        }
        let cold = vec![0.0; self.sections.len()];
        let unit = self.joint.diameter * 1e-3;
        let (stack, solution) = self.solve(&[unit], &cold)?;
        let pressure = grip(&solution);
        let stresses = self.stresses(&stack, &solution)?;
        let onset = stresses
            .iter()
            .enumerate()
            .filter_map(|(ring, stress)| Some((ring, stress.safety? * pressure)))
            .min_by(|a, b| a.1.total_cmp(&b.1));
        Ok(onset.map(|(ring, onset_pressure)| OnsetOfYield {
            ring,
            pressure: onset_pressure,
            interference: unit * onset_pressure / pressure - self.thermal_interference(),
        }))
    }

    /// Interference that the shop temperature adds, m.
    fn thermal_interference(&self) -> f64 {
        let outer = self.shop_strain.get(1).copied().unwrap_or(0.0);
        (first(&self.shop_strain) - outer) * self.joint.diameter
    }
}

struct Capacity {
    axial: f64,
    torque: f64,
}

fn first(values: &[f64]) -> f64 {
    values.first().copied().unwrap_or(0.0)
}

fn grip(solution: &StackSolution) -> f64 {
    first(&solution.pressures)
}

fn section(ring: &Ring) -> Result<RingSection, MechanicsError> {
    RingSection::new(
        0.5 * ring.inner_diameter,
        0.5 * ring.outer_diameter,
        ring.material.youngs_modulus.value,
        ring.material.poisson.value,
        ring.material.density.value,
    )
}

/// Free thermal strain of each ring at its temperature.
pub(super) fn free_strains(joint: &Joint, temperatures: &[f64]) -> Result<Vec<f64>, FindingsError> {
    joint
        .rings
        .iter()
        .zip(temperatures)
        .map(|(ring, temperature)| {
            ring.material
                .expansion
                .strain(*temperature)
                .map_err(|cause| FindingsError::Expansion { material: ring.material.name.clone(), cause })
        })
        .collect()
}

fn slip_safety(state: &DutyState, capacity: &Capacity) -> Option<f64> {
    if state.torque == 0.0 && state.axial_force == 0.0 {
        return None;
    }
    Some(capacity::slip_safety(state.torque, state.axial_force, capacity.torque, capacity.axial))
}

/// Stress of a ring at both faces, and its safety by the criterion of its kind.
fn ring_stress(
    ring: &Ring,
    section: &RingSection,
    load: &RingLoad,
    criterion: DuctileCriterion,
) -> Result<RingStress, MechanicsError> {
    let (inner, outer) = (section.inner_radius(), section.outer_radius());
    let mut bore = section.stress_at(load, inner)?;
    let mut rim = section.stress_at(load, outer)?;
    // At a loaded face the radial stress is the pressure itself; rounding must not blur a free face.
    if !section.is_solid() {
        bore.radial = 0.0 - load.inner_pressure;
    }
    rim.radial = 0.0 - load.outer_pressure;
    let (bore, rim) = (face(bore), face(rim));
    let (equivalent, strength) = match (ring.material.kind, criterion) {
        (Kind::Brittle, _) => {
            let tension = |face: &FaceStress| criteria::greatest_principal(face.radial, face.hoop).max(0.0);
            (tension(&bore).max(tension(&rim)), ring.strength.tensile_strength)
        }
        (_, DuctileCriterion::VonMises) => (bore.von_mises.max(rim.von_mises), ring.strength.yield_strength),
        (_, DuctileCriterion::Tresca) => (bore.tresca.max(rim.tresca), ring.strength.yield_strength),
    };
    let safety = strength.filter(|_| equivalent > 0.0).map(|strength| strength / equivalent);
    Ok(RingStress {
        bore,
        rim,
        equivalent,
        strength,
        safety,
        bore_change: 2.0 * section.displacement_at(load, inner)?,
        outer_change: 2.0 * section.displacement_at(load, outer)?,
    })
}

fn face(stress: Stress) -> FaceStress {
    FaceStress {
        radial: stress.radial,
        hoop: stress.hoop,
        von_mises: criteria::von_mises(stress.radial, stress.hoop),
        tresca: criteria::tresca(stress.radial, stress.hoop),
    }
}
