//! A stack of rings: all interface pressures from one tridiagonal system, with interfaces that may open.

use nalgebra::DVector;

use super::error::MechanicsError;
use super::ring::{RingLoad, RingSection, check};

/// Rings from the innermost outwards with what acts on them.
#[derive(Debug, Clone, PartialEq)]
pub struct Stack {
    /// The rings.
    pub rings: Vec<RingSection>,
    /// Diametral interference at each interface, m; negative is clearance.
    pub interference: Vec<f64>,
    /// Free thermal strain of each ring.
    pub free_strain: Vec<f64>,
    /// Pressure inside the innermost ring, Pa.
    pub inner_pressure: f64,
    /// Pressure outside the outermost ring, Pa.
    pub outer_pressure: f64,
    /// Angular speed, rad/s.
    pub angular_speed: f64,
}

/// Pressures and gaps at the interfaces.
#[derive(Debug, Clone, PartialEq)]
pub struct StackSolution {
    /// Contact pressure, Pa; zero where the interface is open.
    pub pressures: Vec<f64>,
    /// Radial gap, m; zero where the interface is closed.
    pub gaps: Vec<f64>,
    /// Whether the interface is open.
    pub open: Vec<bool>,
}

impl Stack {
    /// Solves for the one set of pressures p ≥ 0 and gaps g ≥ 0 with p g = 0 at each interface.
    ///
    /// # Errors
    /// Rings that do not meet, lists of the wrong length, pressure inside a solid core, numbers not finite.
    pub fn solve(&self) -> Result<StackSolution, MechanicsError> {
        self.check()?;
        let system = System::of(self)?;
        let count = self.interference.len();
        let all_closed = vec![true; count];
        let pressures = system.solve(&all_closed);
        if pressures.iter().all(|pressure| *pressure >= 0.0) {
            return Ok(StackSolution { pressures, gaps: vec![0.0; count], open: vec![false; count] });
        }
        // The matrix has no positive off-diagonal term, so closing every interface that overlaps, again and again,
        // only ever raises the pressures and ends at the one solution (R. Chandrasekaran, Opsearch 7 (1970) 263-268).
        let mut closed = vec![false; count];
        let mut pressures = vec![0.0; count];
        for _ in 0..=count {
            let gaps = system.gaps(&pressures);
            let overlapping: Vec<usize> = (0..count).filter(|k| !closed[*k] && gaps[*k] < 0.0).collect();
            if overlapping.is_empty() {
                break;
            }
            overlapping.into_iter().for_each(|k| closed[k] = true);
            pressures = system.solve(&closed);
        }
        let gaps = system.gaps(&pressures);
        let gaps = gaps.iter().zip(&closed).map(|(gap, closed)| if *closed { 0.0 } else { *gap }).collect();
        Ok(StackSolution { pressures, gaps, open: closed.iter().map(|closed| !closed).collect() })
    }

    /// What acts on ring `index` in a solution.
    ///
    /// # Errors
    /// An index that is no ring.
    pub fn ring_load(&self, index: usize, solution: &StackSolution) -> Result<RingLoad, MechanicsError> {
        let wrong =
            MechanicsError::WrongCount { what: "ring numbers", count: index, rings: self.rings.len() };
        let free_strain = *self.free_strain.get(index).ok_or(wrong)?;
        let inner = index.checked_sub(1).and_then(|k| solution.pressures.get(k)).copied();
        let outer = solution.pressures.get(index).copied();
        Ok(RingLoad {
            inner_pressure: inner.unwrap_or(self.inner_pressure),
            outer_pressure: outer.unwrap_or(self.outer_pressure),
            angular_speed: self.angular_speed,
            free_strain,
        })
    }

    fn check(&self) -> Result<(), MechanicsError> {
        let rings = self.rings.len();
        let counts = [
            ("interferences", self.interference.len(), rings.saturating_sub(1)),
            ("free strains", self.free_strain.len(), rings),
        ];
        if rings < 2 {
            return Err(MechanicsError::WrongCount { what: "rings", count: rings, rings: 2 });
        }
        for (what, count, wanted) in counts {
            if count != wanted {
                return Err(MechanicsError::WrongCount { what, count, rings });
            }
        }
        for (inner, pair) in self.rings.windows(2).enumerate() {
            let (ends, begins) = (pair[0].outer_radius(), pair[1].inner_radius());
            if (ends - begins).abs() > 1e-9 * ends {
                return Err(MechanicsError::RingsDoNotMeet { inner, ends, begins });
            }
        }
        for value in self.interference.iter().chain(&self.free_strain) {
            check("interference or strain", *value, "finite", true)?;
        }
        check("speed (rad/s)", self.angular_speed, "finite", true)
    }
}

/// Radial gaps g = M p + q, with M tridiagonal.
struct System {
    diagonal: DVector<f64>,
    lower: DVector<f64>,
    upper: DVector<f64>,
    free_gaps: DVector<f64>,
}

impl System {
    fn of(stack: &Stack) -> Result<Self, MechanicsError> {
        let count = stack.interference.len();
        let mut system = Self {
            diagonal: DVector::zeros(count),
            lower: DVector::zeros(count),
            upper: DVector::zeros(count),
            free_gaps: DVector::zeros(count),
        };
        let inner_unit = RingLoad { inner_pressure: 1.0, ..RingLoad::default() };
        let outer_unit = RingLoad { outer_pressure: 1.0, ..RingLoad::default() };
        for k in 0..count {
            let (inside, outside) = (&stack.rings[k], &stack.rings[k + 1]);
            let radius = inside.outer_radius();
            let outside_by_own = outside.displacement_at(&inner_unit, outside.inner_radius())?;
            let inside_by_own = inside.displacement_at(&outer_unit, radius)?;
            system.diagonal[k] = outside_by_own - inside_by_own;
            if k > 0 {
                system.lower[k] = -inside.displacement_at(&inner_unit, radius)?;
            }
            if k + 1 < count {
                system.upper[k] = outside.displacement_at(&outer_unit, outside.inner_radius())?;
            }
            let free = |index: usize| RingLoad {
                inner_pressure: if index == 0 { stack.inner_pressure } else { 0.0 },
                outer_pressure: if index + 1 == stack.rings.len() { stack.outer_pressure } else { 0.0 },
                angular_speed: stack.angular_speed,
                free_strain: stack.free_strain[index],
            };
            let outside_free = outside.displacement_at(&free(k + 1), outside.inner_radius())?;
            let inside_free = inside.displacement_at(&free(k), radius)?;
            system.free_gaps[k] = outside_free - inside_free - 0.5 * stack.interference[k];
        }
        Ok(system)
    }

    /// Pressures with these interfaces closed (gap 0) and the others open (pressure 0), by elimination.
    fn solve(&self, closed: &[bool]) -> Vec<f64> {
        let count = closed.len();
        let mut pivot = self.diagonal.clone();
        let mut right = -&self.free_gaps;
        for k in 1..count {
            if closed[k] && closed[k - 1] {
                let factor = self.lower[k] / pivot[k - 1];
                pivot[k] -= factor * self.upper[k - 1];
                right[k] -= factor * right[k - 1];
            }
        }
        let mut pressures = vec![0.0; count];
        for k in (0..count).rev() {
            if closed[k] {
                let next = if k + 1 < count { self.upper[k] * pressures[k + 1] } else { 0.0 };
                pressures[k] = (right[k] - next) / pivot[k];
            }
        }
        pressures
    }

    fn gaps(&self, pressures: &[f64]) -> Vec<f64> {
        let count = pressures.len();
        (0..count)
            .map(|k| {
                let before = if k > 0 { self.lower[k] * pressures[k - 1] } else { 0.0 };
                let after = if k + 1 < count { self.upper[k] * pressures[k + 1] } else { 0.0 };
                self.diagonal[k] * pressures[k] + before + after + self.free_gaps[k]
            })
            .collect()
    }
}
