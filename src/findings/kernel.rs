//! One pair of parts in one condition: pressures, stresses, capacity, slice by slice along the joint.

use super::condition::{Condition, section};
use super::{
    BendingFindings, FaceStress, FindingsError, InterfaceFindings, PairFindings, RingStress, SliceFindings,
    StateFindings, assembly_of,
};
use crate::assembly::press;
use crate::joint::{DutyState, Joint, Ring, SmoothingAt};
use crate::material::{Kind, Range};
use crate::mechanics::MechanicsError;
use crate::mechanics::bending::BentJoint;
use crate::mechanics::capacity;
use crate::mechanics::criteria::{self, DuctileCriterion};
use crate::mechanics::ring::{RingLoad, RingSection, Stress};
use crate::mechanics::stack::{Stack, StackSolution};
use crate::tolerance::Extremes;

/// Interference of one pair at each interface, m.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct PairInterference {
    /// As made.
    pub(super) made: Vec<f64>,
    /// Left to grip.
    pub(super) effective: Vec<f64>,
    /// Had the smoothing loss been taken.
    pub(super) smoothed: Vec<f64>,
    /// What acts on elastic rings: the effective one, less the permanent growth of a hub that has yielded.
    pub(super) grip: Vec<f64>,
}

/// The three pairs with the smoothing loss taken where the joint says.
pub(super) fn pair_interferences(joint: &Joint) -> Extremes<PairInterference> {
    let at = joint.smoothing.at;
    let pair = |pick: fn(Extremes<f64>) -> f64, is_tightest: bool| {
        let takes_loss = match at {
            SmoothingAt::Loosest => !is_tightest,
            SmoothingAt::Both => true,
            SmoothingAt::None => false,
        };
        let made: Vec<f64> = joint.fits.iter().map(|fit| pick(fit.limits.interference())).collect();
        let losses = joint.smoothing.loss.iter().copied().chain(std::iter::repeat(0.0));
        let smoothed: Vec<f64> =
            made.iter().zip(losses).map(|(made, loss)| after_smoothing(*made, loss)).collect();
        let effective = if takes_loss { smoothed.clone() } else { made.clone() };
        PairInterference { made, grip: effective.clone(), effective, smoothed }
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
///
/// # Example
/// ```
/// use hubgrip::findings::after_smoothing;
/// assert_eq!(after_smoothing(10e-6, 13e-6), 0.0);
/// assert_eq!(after_smoothing(-5e-6, 13e-6), -5e-6);
/// ```
pub fn after_smoothing(interference: f64, loss: f64) -> f64 {
    if interference <= 0.0 { interference } else { (interference - loss).max(0.0) }
}

/// A piece of the joint along its length with the rings it has there.
struct Piece {
    /// Length that carries, m.
    length: f64,
    sections: Vec<RingSection>,
}

/// What stays the same from pair to pair.
pub(super) struct Kernel<'a> {
    joint: &'a Joint,
    pieces: Vec<Piece>,
    pub(super) shop: Condition,
}

/// How far parts are moved apart to see their overlap, as a share of the diameter: more than any fit takes.
const WIDE_APART: f64 = 0.05;

/// One condition solved in one piece.
struct Solved {
    length: f64,
    stack: Stack,
    solution: StackSolution,
}

impl<'a> Kernel<'a> {
    pub(super) fn new(joint: &'a Joint) -> Result<Self, FindingsError> {
        let shop = Condition::at_rest(joint, joint.assembly.shop_temperature)?;
        Ok(Self { joint, pieces: pieces(joint)?, shop })
    }

    /// The rings of the first piece; the only one unless the joint is stepped.
    pub(super) fn stack(&self, interference: &[f64], condition: &Condition) -> Result<Stack, FindingsError> {
        self.stack_of(self.pieces.first().map_or(&[], |piece| &piece.sections), interference, condition)
    }

    /// The rings of every piece.
    pub(super) fn stacks(
        &self,
        interference: &[f64],
        condition: &Condition,
    ) -> Result<Vec<Stack>, FindingsError> {
        self.pieces.iter().map(|piece| self.stack_of(&piece.sections, interference, condition)).collect()
    }

    fn stack_of(
        &self,
        sections: &[RingSection],
        interference: &[f64],
        condition: &Condition,
    ) -> Result<Stack, FindingsError> {
        let rings = self.joint.rings.iter().zip(sections).enumerate();
        let rings = rings.map(|(index, (ring, section))| condition.warm(index, ring, *section));
        Ok(Stack {
            rings: rings.collect::<Result<_, _>>()?,
            interference: interference.to_vec(),
            free_strain: condition.strain.clone(),
            strain_rise: condition.rise.clone(),
            inner_pressure: condition.inner_pressure,
            outer_pressure: condition.outer_pressure,
            angular_speed: condition.speed,
        })
    }

    fn solve(&self, interference: &[f64], condition: &Condition) -> Result<Vec<Solved>, FindingsError> {
        self.pieces
            .iter()
            .map(|piece| {
                let stack = self.stack_of(&piece.sections, interference, condition)?;
                let solution = stack.solve()?;
                Ok(Solved { length: piece.length, stack, solution })
            })
            .collect()
    }

    /// Mean contact pressure over the length at the interface joined last.
    pub(super) fn pressure(&self, interference: &[f64], condition: &Condition) -> Result<f64, FindingsError> {
        Ok(mean_pressure(&self.solve(interference, condition)?, self.joint.last_interface()))
    }

    pub(super) fn pair(&self, pair: &PairInterference) -> Result<PairFindings, FindingsError> {
        let joint = self.joint;
        let last = joint.last_interface();
        let solved = self.solve(&pair.grip, &self.shop)?;
        let interfaces = self.interfaces(pair, &solved);
        let pressure = mean_pressure(&solved, last);
        let friction = &joint.friction;
        let diameter = joint.interface_diameter(last);
        let overlap = self.overlap(last, &pair.effective)?;
        let peak =
            |friction: f64| press::peak_force(&assembly_of::press_input(joint, pressure, overlap, friction));
        let release = |friction: f64| capacity::axial(friction, pressure, diameter, joint.engaged_length());
        Ok(PairFindings {
            interference: at(&pair.made, last),
            smoothing: at(&pair.made, last) - at(&pair.effective, last),
            effective_interference: at(&pair.effective, last),
            shop_interference: overlap,
            pressure,
            pressure_smoothed: self.pressure(&pair.smoothed, &self.shop)?,
            pressure_unsmoothed: self.pressure(&pair.made, &self.shop)?,
            rings: self.stresses(&solved)?,
            slices: self.slices(&solved)?,
            torque_capacity: least(&interfaces, |interface| interface.torque_capacity),
            axial_capacity: least(&interfaces, |interface| interface.axial_capacity),
            interfaces,
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

    /// Diametral overlap of the parts at an interface before they are joined, at the shop temperature, m.
    pub(super) fn overlap(&self, interface: usize, interference: &[f64]) -> Result<f64, FindingsError> {
        if let [inner, outer] = self.shop.strain.as_slice() {
            let diameter = self.joint.interface_diameter(interface);
            return Ok(at(interference, interface) + diameter * (inner - outer));
        }
        // The rings within and without are strained by the joints made before: moved wide apart, the parts show by how
        // much they would overlap.
        let apart = WIDE_APART * self.joint.interface_diameter(interface);
        let mut opened = interference.to_vec();
        if let Some(opened) = opened.get_mut(interface) {
            *opened -= apart;
        }
        let solved = self.solve(&opened, &self.shop)?;
        Ok(apart - 2.0 * solved.first().map_or(0.0, |piece| at(&piece.solution.gaps, interface)))
    }

    /// One pair in a service state; of its contact pressure only the share `relaxation` is left for holding.
    pub(super) fn state(
        &self,
        state: &DutyState,
        pair: &PairInterference,
        relaxation: f64,
    ) -> Result<StateFindings, FindingsError> {
        let condition = Condition::of_state(self.joint, state)?;
        let solved = self.solve(&pair.grip, &condition)?;
        let mut interfaces = self.interfaces(pair, &solved);
        for interface in &mut interfaces {
            interface.pressure *= relaxation;
            interface.torque_capacity *= relaxation;
            interface.axial_capacity *= relaxation;
        }
        let pressure = relaxation * mean_pressure(&solved, self.joint.last_interface());
        let loaded = state.torque > 0.0 || state.axial_force > 0.0;
        let slip = |interface: &InterfaceFindings| {
            capacity::slip_safety(
                state.torque,
                state.axial_force,
                interface.torque_capacity,
                interface.axial_capacity,
            )
        };
        Ok(StateFindings {
            pressure,
            torque_capacity: least(&interfaces, |interface| interface.torque_capacity),
            axial_capacity: least(&interfaces, |interface| interface.axial_capacity),
            slip_safety: loaded.then(|| least(&interfaces, slip)),
            bending: self.bending(state, &solved, relaxation)?,
            rings: self.stresses(&solved)?,
            interfaces,
        })
    }

    /// Stress of each ring under these interferences.
    pub(super) fn ring_stresses(
        &self,
        interference: &[f64],
        condition: &Condition,
    ) -> Result<Vec<RingStress>, FindingsError> {
        self.stresses(&self.solve(interference, condition)?)
    }

    fn interfaces(&self, pair: &PairInterference, solved: &[Solved]) -> Vec<InterfaceFindings> {
        let friction = self.joint.friction.holding.value.low;
        (0..pair.made.len())
            .map(|k| {
                let diameter = self.joint.interface_diameter(k);
                let axial: f64 = solved
                    .iter()
                    .map(|piece| {
                        capacity::axial(friction, at(&piece.solution.pressures, k), diameter, piece.length)
                    })
                    .sum();
                let gap = solved.iter().map(|piece| at(&piece.solution.gaps, k)).fold(0.0, f64::max);
                InterfaceFindings {
                    diameter,
                    interference: at(&pair.made, k),
                    effective_interference: at(&pair.effective, k),
                    pressure: mean_pressure(solved, k),
                    gap: 2.0 * gap,
                    open: solved.iter().all(|piece| piece.solution.open.get(k).copied().unwrap_or(false)),
                    torque_capacity: axial * diameter / 2.0,
                    axial_capacity: axial,
                }
            })
            .collect()
    }

    /// The stresses of each ring in the piece where its safety is least.
    fn stresses(&self, solved: &[Solved]) -> Result<Vec<RingStress>, FindingsError> {
        let mut worst: Vec<RingStress> = Vec::new();
        for piece in solved {
            for (index, found) in self.piece_stresses(piece)?.into_iter().enumerate() {
                match worst.get_mut(index) {
                    None => worst.push(found),
                    Some(known) if found.equivalent > known.equivalent => *known = found,
                    Some(_) => {}
                }
            }
        }
        Ok(worst)
    }

    fn piece_stresses(&self, piece: &Solved) -> Result<Vec<RingStress>, FindingsError> {
        self.joint
            .rings
            .iter()
            .zip(&piece.stack.rings)
            .enumerate()
            .map(|(index, (ring, section))| {
                let load = piece.stack.ring_load(index, &piece.solution)?;
                Ok(ring_stress(ring, section, &load, self.joint.criterion)?)
            })
            .collect()
    }

    /// The slices of a stepped joint; none when it is of one section.
    fn slices(&self, solved: &[Solved]) -> Result<Vec<SliceFindings>, FindingsError> {
        self.joint
            .slices
            .iter()
            .zip(solved)
            .map(|(slice, piece)| {
                Ok(SliceFindings {
                    length: slice.length,
                    hub_outer_diameter: slice.hub_outer_diameter,
                    shaft_bore: slice.shaft_bore,
                    pressure: at(&piece.solution.pressures, 0),
                    rings: self.piece_stresses(piece)?,
                })
            })
            .collect()
    }

    /// Bending at the edges; of a stepped joint at the slices there, whose pressure is not the mean one.
    fn bending(
        &self,
        state: &DutyState,
        solved: &[Solved],
        relaxation: f64,
    ) -> Result<Option<BendingFindings>, FindingsError> {
        if state.bending_moment == 0.0 && state.radial_force == 0.0 {
            return Ok(None);
        }
        let last = self.joint.last_interface();
        let diameter = self.joint.interface_diameter(last);
        let length = self.joint.engaged_length();
        let bent = |pressure: f64| BentJoint { diameter, length, pressure };
        let edge_change = bent(0.0).edge_pressure_rise(state.bending_moment, state.radial_force)?;
        let ends: Vec<&Solved> = solved.first().into_iter().chain(solved.last()).collect();
        let pressures = || ends.iter().map(|end| relaxation * at(&end.solution.pressures, last));
        let low = pressures().fold(f64::INFINITY, f64::min);
        let high = pressures().fold(0.0, f64::max);
        let mut weakest: Option<(usize, f64)> = None;
        for (end, pressure) in ends.iter().zip(pressures()).filter(|_| !self.joint.slices.is_empty()) {
            for (ring, stress) in self.piece_stresses(end)?.iter().enumerate() {
                let Some(safety) = stress.safety else { continue };
                let loaded = safety * pressure / (pressure + edge_change);
                if weakest.is_none_or(|(_, known)| loaded < known) {
                    weakest = Some((ring, loaded));
                }
            }
        }
        Ok(Some(BendingFindings {
            edge_change,
            least_edge: low - edge_change,
            greatest_edge: high + edge_change,
            limiting_moment: bent(low).limiting_moment(state.radial_force)?,
            weakest,
        }))
    }

    /// Stresses of the rings when only these interferences act, at rest, with the pressure they make: no free strain,
    /// but the moduli of the shop temperature.
    pub(super) fn cold(&self, interference: &[f64]) -> Result<(f64, Vec<RingStress>), FindingsError> {
        let cold = Condition { strain: vec![0.0; self.joint.rings.len()], ..self.shop.clone() };
        let solved = self.solve(interference, &cold)?;
        Ok((mean_pressure(&solved, 0), self.stresses(&solved)?))
    }
}

/// The pieces of a joint along its length: one unless it is stepped.
fn pieces(joint: &Joint) -> Result<Vec<Piece>, FindingsError> {
    let sections = joint.rings.iter().map(|ring| section(ring, ring.inner_diameter, ring.outer_diameter));
    let sections = sections.collect::<Result<Vec<_>, _>>()?;
    if joint.slices.is_empty() {
        return Ok(vec![Piece { length: joint.engaged_length(), sections }]);
    }
    let (shaft, hub) = joint.shaft_and_hub();
    let carrying = joint.engaged_length() / joint.length;
    joint
        .slices
        .iter()
        .map(|slice| {
            Ok(Piece {
                length: slice.length * carrying,
                sections: vec![
                    section(shaft, slice.shaft_bore, shaft.outer_diameter)?,
                    section(hub, hub.inner_diameter, slice.hub_outer_diameter)?,
                ],
            })
        })
        .collect()
}

fn mean_pressure(solved: &[Solved], interface: usize) -> f64 {
    let length: f64 = solved.iter().map(|piece| piece.length).sum();
    solved.iter().map(|piece| at(&piece.solution.pressures, interface) * piece.length / length).sum()
}

fn at(values: &[f64], index: usize) -> f64 {
    values.get(index).copied().unwrap_or(0.0)
}

fn least(interfaces: &[InterfaceFindings], value: impl Fn(&InterfaceFindings) -> f64) -> f64 {
    interfaces.iter().map(value).min_by(f64::total_cmp).unwrap_or(0.0)
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
            let share = ring.tension_share();
            let tension = |face: &FaceStress| criteria::brittle(face.radial, face.hoop, share);
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
