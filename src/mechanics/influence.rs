//! Gaps of a stack by its pressures: the influence matrix, and elimination along it.
//!
//! The three diagonals are vectors of [`nalgebra`]; its dense solvers would take the cube of the number of rings where
//! elimination along the diagonals takes as many steps as there are rings.

use nalgebra::DVector;

use super::error::MechanicsError;
use super::ring::RingLoad;
use super::stack::Stack;

/// Radial gaps of a stack, linear in its contact pressures.
///
/// g = M p + q
///
/// g radial gap at each interface (m), p contact pressure (Pa), M influence matrix (m/Pa), q gaps without contact
/// pressure (m), which carry the interference, rotation, temperature and outside pressures. An interface feels its
/// own pressure and those of its two neighbours only, so M is tridiagonal. Its diagonal is positive and its other
/// terms are not: pressure beside an interface closes it. By Betti's reciprocal theorem r M is symmetric, r being
/// the radius of the row's interface.
///
/// Holds for elastic rings in plane stress. Source: Timoshenko & Goodier, *Theory of Elasticity*, 3rd ed., § 28,
/// for each ring.
#[derive(Debug, Clone, PartialEq)]
pub struct Influence {
    /// M(k, k), m/Pa.
    pub diagonal: DVector<f64>,
    /// M(k, k − 1), m/Pa; the first is zero.
    pub lower: DVector<f64>,
    /// M(k, k + 1), m/Pa; the last is zero.
    pub upper: DVector<f64>,
    /// q, m.
    pub free_gaps: DVector<f64>,
}

impl Influence {
    pub(super) fn of(stack: &Stack) -> Result<Self, MechanicsError> {
        let count = stack.interference.len();
        let zeros = || DVector::zeros(count);
        let mut influence = Self { diagonal: zeros(), lower: zeros(), upper: zeros(), free_gaps: zeros() };
        let inner_unit = RingLoad { inner_pressure: 1.0, ..RingLoad::default() };
        let outer_unit = RingLoad { outer_pressure: 1.0, ..RingLoad::default() };
        for (k, pair) in stack.rings.windows(2).enumerate() {
            let (inside, outside) = (&pair[0], &pair[1]);
            let (rim, bore) = (inside.outer_radius(), outside.inner_radius());
            influence.diagonal[k] =
                outside.displacement_at(&inner_unit, bore)? - inside.displacement_at(&outer_unit, rim)?;
            if k > 0 {
                influence.lower[k] = -inside.displacement_at(&inner_unit, rim)?;
            }
            if k + 1 < count {
                influence.upper[k] = outside.displacement_at(&outer_unit, bore)?;
            }
            influence.free_gaps[k] = outside.displacement_at(&stack.load_without_contact(k + 1), bore)?
                - inside.displacement_at(&stack.load_without_contact(k), rim)?
                - 0.5 * stack.interference[k];
        }
        Ok(influence)
    }

    /// Number of interfaces.
    pub fn len(&self) -> usize {
        self.diagonal.len()
    }

    /// Whether there is no interface.
    pub fn is_empty(&self) -> bool {
        self.diagonal.is_empty()
    }

    /// Radial gaps under these pressures, m.
    pub fn gaps(&self, pressures: &DVector<f64>) -> DVector<f64> {
        self.gaps_from(&self.free_gaps, pressures)
    }

    /// M p + `free_gaps`, for other free gaps than the stack's own.
    pub(super) fn gaps_from(&self, free_gaps: &DVector<f64>, pressures: &DVector<f64>) -> DVector<f64> {
        let mut gaps = free_gaps + self.diagonal.component_mul(pressures);
        for k in 1..self.len() {
            gaps[k] += self.lower[k] * pressures[k - 1];
            gaps[k - 1] += self.upper[k - 1] * pressures[k];
        }
        gaps
    }

    /// Pressures that close these interfaces, the others being without pressure.
    pub(super) fn closing_pressures(&self, closed: &[bool]) -> DVector<f64> {
        self.closing_pressures_from(&self.free_gaps, closed)
    }

    /// Pressures that take back `free_gaps` at these interfaces, the others being without pressure.
    pub(super) fn closing_pressures_from(&self, free_gaps: &DVector<f64>, closed: &[bool]) -> DVector<f64> {
        eliminate(&self.lower, &self.diagonal, &self.upper, -free_gaps, closed)
    }

    /// x with Mᵀ x = `right` over the closed interfaces, zero at the others.
    pub(super) fn solve_transposed(&self, right: DVector<f64>, closed: &[bool]) -> DVector<f64> {
        let count = self.len();
        let lower = DVector::from_fn(count, |k, _| if k > 0 { self.upper[k - 1] } else { 0.0 });
        let upper = DVector::from_fn(count, |k, _| if k + 1 < count { self.lower[k + 1] } else { 0.0 });
        eliminate(&lower, &self.diagonal, &upper, right, closed)
    }
}

/// Gaussian elimination of a tridiagonal system over the closed interfaces; the unknown is zero at the others.
fn eliminate(
    lower: &DVector<f64>,
    diagonal: &DVector<f64>,
    upper: &DVector<f64>,
    right: DVector<f64>,
    closed: &[bool],
) -> DVector<f64> {
    let count = closed.len();
    let (mut pivot, mut right) = (diagonal.clone(), right);
    for k in 1..count {
        if closed[k] && closed[k - 1] {
            let factor = lower[k] / pivot[k - 1];
            pivot[k] -= factor * upper[k - 1];
            right[k] -= factor * right[k - 1];
        }
    }
    let mut solution = DVector::zeros(count);
    for k in (0..count).rev().filter(|k| closed[*k]) {
        let next = if k + 1 < count { upper[k] * solution[k + 1] } else { 0.0 };
        solution[k] = (right[k] - next) / pivot[k];
    }
    solution
}
