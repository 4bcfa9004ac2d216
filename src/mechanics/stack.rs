//! A stack of rings: all interface pressures from one tridiagonal system, with interfaces that may open.

use nalgebra::DVector;

use super::error::MechanicsError;
use super::influence::Influence;
use super::ring::{RingLoad, RingSection, check};

/// Rings from the innermost outwards with what acts on them.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Stack {
    /// The rings.
    pub rings: Vec<RingSection>,
    /// Diametral interference at each interface, m; negative is clearance.
    pub interference: Vec<f64>,
    /// Free thermal strain of each ring; with a strain rise, that at its inner face.
    pub free_strain: Vec<f64>,
    /// Free strain of each ring at its outer face less that at its inner face, in steady radial conduction; empty
    /// when every ring is of one temperature.
    pub strain_rise: Vec<f64>,
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
    /// Solves for the one set of pressures and gaps of which one is zero at each interface and none negative.
    ///
    /// g = M p + q, p ≥ 0, g ≥ 0, p g = 0
    ///
    /// p contact pressure (Pa), g radial gap (m), M and q as in [`Influence`].
    ///
    /// An interface that would need a pull opens, and its neighbours then carry other pressures than with it
    /// closed. Holds for elastic rings in plane stress; an open ring stays concentric.
    ///
    /// Source: Lamé's solution for each ring (Timoshenko & Goodier, *Theory of Elasticity*, 3rd ed., §§ 28, 32);
    /// M has no positive term off its diagonal, so closing every interface that overlaps, again and again, only
    /// raises the pressures and ends at the one solution (R. Chandrasekaran, *Opsearch* 7 (1970) 263–268).
    ///
    /// # Errors
    /// Rings that do not meet, lists of the wrong length, pressure inside a solid core, numbers not finite.
    ///
    /// # Example
    /// ```
    /// use hubgrip::mechanics::{ring::RingSection, stack::Stack};
    /// let steel = |inner, outer| RingSection::new(inner, outer, 200e9, 0.3, 7800.0).unwrap();
    /// let stack = Stack {
    ///     rings: vec![steel(0.010, 0.020), steel(0.020, 0.030), steel(0.030, 0.050)],
    ///     interference: vec![20e-6, -20e-6],
    ///     free_strain: vec![0.0; 3],
    ///     ..Stack::default()
    /// };
    /// let solution = stack.solve().unwrap();
    /// assert!((solution.pressures[0] - 23.4375e6).abs() < 1e-3);
    /// assert_eq!(solution.open, [false, true]);
    /// assert!((solution.gaps[1] - 4.375e-6).abs() < 1e-15);
    /// ```
    pub fn solve(&self) -> Result<StackSolution, MechanicsError> {
        let influence = self.influence()?;
        let count = influence.len();
        let pressures = influence.closing_pressures(&vec![true; count]);
        if pressures.iter().all(|pressure| *pressure >= 0.0) {
            let pressures = pressures.data.into();
            return Ok(StackSolution { pressures, gaps: vec![0.0; count], open: vec![false; count] });
        }
        let mut closed = vec![false; count];
        let mut pressures = DVector::zeros(count);
        for _ in 0..=count {
            let gaps = influence.gaps(&pressures);
            let overlapping: Vec<usize> = (0..count).filter(|k| !closed[*k] && gaps[*k] < 0.0).collect();
            if overlapping.is_empty() {
                break;
            }
            overlapping.into_iter().for_each(|k| closed[k] = true);
            pressures = influence.closing_pressures(&closed);
        }
        let gaps = influence.gaps(&pressures);
        let gaps = gaps.iter().zip(&closed).map(|(gap, closed)| if *closed { 0.0 } else { *gap }).collect();
        let pressures = pressures.data.into();
        Ok(StackSolution { pressures, gaps, open: closed.iter().map(|closed| !closed).collect() })
    }

    /// Influence of the pressures on the gaps.
    ///
    /// # Errors
    /// As [`Self::solve`].
    ///
    /// # Example
    /// ```
    /// use hubgrip::mechanics::{ring::RingSection, stack::Stack};
    /// let steel = |inner, outer| RingSection::new(inner, outer, 200e9, 0.3, 7800.0).unwrap();
    /// let stack = Stack {
    ///     rings: vec![steel(0.010, 0.020), steel(0.020, 0.030), steel(0.030, 0.050)],
    ///     interference: vec![20e-6, 30e-6],
    ///     free_strain: vec![0.0; 3],
    ///     ..Stack::default()
    /// };
    /// assert!((stack.influence().unwrap().lower[1] + 2.4e-13).abs() < 1e-25);
    /// ```
    pub fn influence(&self) -> Result<Influence, MechanicsError> {
        self.check()?;
        Influence::of(self)
    }

    /// What acts on ring `index` in a solution.
    ///
    /// # Errors
    /// An index that is no ring.
    pub fn ring_load(&self, index: usize, solution: &StackSolution) -> Result<RingLoad, MechanicsError> {
        if index >= self.rings.len() {
            return Err(MechanicsError::WrongCount {
                what: "ring numbers",
                count: index,
                rings: self.rings.len(),
            });
        }
        let free = self.load_without_contact(index);
        let inner = index.checked_sub(1).and_then(|k| solution.pressures.get(k)).copied();
        let outer = solution.pressures.get(index).copied();
        Ok(RingLoad {
            inner_pressure: inner.unwrap_or(free.inner_pressure),
            outer_pressure: outer.unwrap_or(free.outer_pressure),
            ..free
        })
    }

    /// What acts on ring `index` without its neighbours.
    pub(super) fn load_without_contact(&self, index: usize) -> RingLoad {
        let last = index + 1 == self.rings.len();
        RingLoad {
            inner_pressure: if index == 0 { self.inner_pressure } else { 0.0 },
            outer_pressure: if last { self.outer_pressure } else { 0.0 },
            angular_speed: self.angular_speed,
            free_strain: self.free_strain.get(index).copied().unwrap_or(0.0),
            strain_rise: self.strain_rise.get(index).copied().unwrap_or(0.0),
        }
    }

    fn check(&self) -> Result<(), MechanicsError> {
        let rings = self.rings.len();
        if rings < 2 {
            return Err(MechanicsError::WrongCount { what: "rings", count: rings, rings: 2 });
        }
        let rises = if self.strain_rise.is_empty() { rings } else { self.strain_rise.len() };
        let counts = [
            ("interferences", self.interference.len(), rings - 1),
            ("free strains", self.free_strain.len(), rings),
            ("strain rises", rises, rings),
        ];
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
        for interference in &self.interference {
            check("interference (m)", *interference, "finite", true)?;
        }
        Ok(())
    }
}
