//! Which end of each interference governs a pressure or a stress of a stack.

use super::criteria;
use super::error::MechanicsError;
use super::ring::{RingLoad, Stress, check};
use super::stack::{Stack, StackSolution};

/// A pressure or a stress of a stack.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum StackQuantity {
    /// Contact pressure at an interface, Pa.
    Pressure {
        /// Number of the interface, from the innermost, from zero.
        interface: usize,
    },
    /// A stress in a ring, Pa.
    Stress {
        /// Number of the ring, from the innermost, from zero.
        ring: usize,
        /// Radius, m.
        radius: f64,
        /// Which stress.
        measure: StressMeasure,
    },
}

/// A stress, or an equivalent of the stresses, at a place.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum StressMeasure {
    /// Radial stress.
    Radial,
    /// Hoop stress.
    Hoop,
    /// [`criteria::von_mises`].
    VonMises,
    /// [`criteria::tresca`].
    Tresca,
    /// [`criteria::greatest_principal`].
    GreatestPrincipal,
    /// [`criteria::brittle`].
    Brittle {
        /// Tensile over compressive strength; zero leaves compression out.
        tension_share: f64,
    },
}

/// Which extreme of a quantity is wanted.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Extreme {
    /// The greatest value.
    Greatest,
    /// The least value.
    Least,
}

/// The governing combination of interferences, and what it gives.
#[derive(Debug, Clone, PartialEq)]
pub struct Governing {
    /// Whether each interface is at its tightest; otherwise at its loosest.
    pub tight: Vec<bool>,
    /// The diametral interferences, m.
    pub interference: Vec<f64>,
    /// The pressures and gaps they give.
    pub solution: StackSolution,
    /// The quantity, Pa.
    pub value: f64,
}

/// Steps after which a search from one corner ends; each improves the value, and few have been seen to take four.
const MAX_STEPS: usize = 32;

impl Stack {
    /// The value of a quantity in a solution, Pa.
    ///
    /// # Errors
    /// An interface or ring that is not there, a radius outside the ring.
    pub fn value_of(&self, quantity: StackQuantity, solution: &StackSolution) -> Result<f64, MechanicsError> {
        match quantity {
            StackQuantity::Pressure { interface } => {
                solution.pressures.get(interface).copied().ok_or(self.no_such("interface numbers", interface))
            }
            StackQuantity::Stress { ring, radius, measure } => {
                let load = self.ring_load(ring, solution)?;
                let stress = self.rings[ring].stress_at(&load, radius)?;
                Ok(measure.of(stress.radial, stress.hoop))
            }
        }
    }

    /// Derivative of a quantity by the diametral interference at each interface, Pa/m.
    ///
    /// ∂Q/∂δ = x/2 at the closed interfaces with Mᵀ x = ∂Q/∂p over them, and zero at the open ones
    ///
    /// Q quantity (Pa), δ diametral interference (m), p contact pressure (Pa), M influence matrix (m/Pa, see
    /// [`super::influence::Influence`]).
    ///
    /// Holds while no interface opens or closes. A pressure never falls as an interference rises: M has no positive
    /// term off its diagonal, so no term of its inverse is negative. One elimination along the stack, so the work
    /// grows with the number of rings. Source: the adjoint method for a linear system.
    ///
    /// # Errors
    /// As [`Self::solve`] and [`Self::value_of`].
    ///
    /// # Example
    /// ```
    /// use hubgrip::mechanics::{governing::StackQuantity, ring::RingSection, stack::Stack};
    /// let steel = |inner, outer| RingSection::new(inner, outer, 200e9, 0.3, 7800.0).unwrap();
    /// let stack = Stack {
    ///     rings: vec![steel(0.0, 0.025), steel(0.025, 0.050)],
    ///     interference: vec![50e-6],
    ///     free_strain: vec![0.0; 2],
    ///     ..Stack::default()
    /// };
    /// let solution = stack.solve().unwrap();
    /// let slopes = stack.sensitivities(StackQuantity::Pressure { interface: 0 }, &solution).unwrap();
    /// assert!((slopes[0] - 1.5e12).abs() < 1.0);
    /// ```
    pub fn sensitivities(
        &self,
        quantity: StackQuantity,
        solution: &StackSolution,
    ) -> Result<Vec<f64>, MechanicsError> {
        let influence = self.influence()?;
        let right = self.slopes_by_pressure(quantity, solution)?;
        let closed: Vec<bool> = solution.open.iter().map(|open| !open).collect();
        if closed.len() != influence.len() {
            return Err(self.no_such("interfaces of a solution", closed.len()));
        }
        let adjoint = influence.solve_transposed(right.into(), &closed);
        Ok((0.5 * adjoint).data.into())
    }

    /// The combination of loosest and tightest interferences that gives the extreme of a quantity.
    ///
    /// From the corner with every interface tight and from that with every one loose (for an equivalent stress also
    /// from those that govern the radial and the hoop stress), each interference is set to the end that the sign of
    /// its sensitivity asks for, until the value no longer improves; the best is given.
    ///
    /// The pressures rise with every interference, so their extremes are the corners themselves. A stress of one
    /// ring may rise with one and fall with another. While no interface opens or closes within the ranges the
    /// radial and hoop stress are linear, and the combination is the governing one. The equivalent stresses are
    /// convex, so their greatest value stands at a corner and the least may lie between; there, and where interfaces
    /// open within the ranges, the combination found is better than its neighbours along the slopes but not proven
    /// to be the best of all. Speed, temperature and outside pressures stay those of the stack.
    ///
    /// # Errors
    /// As [`Self::solve`] and [`Self::value_of`]; lists that do not fit the stack; a loosest interference above the
    /// tightest.
    ///
    /// # Example
    /// ```
    /// use hubgrip::mechanics::governing::{Extreme, StackQuantity, StressMeasure};
    /// use hubgrip::mechanics::{ring::RingSection, stack::Stack};
    /// let steel = |inner, outer| RingSection::new(inner, outer, 200e9, 0.3, 7800.0).unwrap();
    /// let stack = Stack {
    ///     rings: vec![steel(0.010, 0.020), steel(0.020, 0.030), steel(0.030, 0.050)],
    ///     interference: vec![20e-6, 30e-6],
    ///     free_strain: vec![0.0; 3],
    ///     ..Stack::default()
    /// };
    /// let hoop = StackQuantity::Stress { ring: 1, radius: 0.020, measure: StressMeasure::Hoop };
    /// let governing = stack.governing(&[10e-6, 15e-6], &[20e-6, 30e-6], hoop, Extreme::Greatest).unwrap();
    /// assert_eq!(governing.tight, [true, false]);
    /// ```
    pub fn governing(
        &self,
        loosest: &[f64],
        tightest: &[f64],
        quantity: StackQuantity,
        extreme: Extreme,
    ) -> Result<Governing, MechanicsError> {
        self.check_ranges(loosest, tightest)?;
        let ranges = Ranges { stack: self, loosest, tightest, quantity, extreme };
        let mut best = ranges.climb(vec![true; loosest.len()])?;
        for start in ranges.other_starts()? {
            let other = ranges.climb(start)?;
            if ranges.is_better(other.value, best.value) {
                best = other;
            }
        }
        Ok(best)
    }

    fn slopes_by_pressure(
        &self,
        quantity: StackQuantity,
        solution: &StackSolution,
    ) -> Result<Vec<f64>, MechanicsError> {
        let mut slopes = vec![0.0; self.interference.len()];
        match quantity {
            StackQuantity::Pressure { interface } => {
                *slopes.get_mut(interface).ok_or(self.no_such("interface numbers", interface))? = 1.0;
            }
            StackQuantity::Stress { ring, radius, measure } => {
                let load = self.ring_load(ring, solution)?;
                let stress = self.rings[ring].stress_at(&load, radius)?;
                let (by_radial, by_hoop) = measure.slopes(stress.radial, stress.hoop);
                for (interface, unit) in self.unit_stresses(ring, radius)? {
                    slopes[interface] = by_radial * unit.radial + by_hoop * unit.hoop;
                }
            }
        }
        Ok(slopes)
    }

    /// Stress at a place of a ring under a unit pressure at each of its interfaces.
    fn unit_stresses(&self, ring: usize, radius: f64) -> Result<Vec<(usize, Stress)>, MechanicsError> {
        let section = &self.rings[ring];
        let mut stresses = Vec::with_capacity(2);
        if ring > 0 {
            let inner = RingLoad { inner_pressure: 1.0, ..RingLoad::default() };
            stresses.push((ring - 1, section.stress_at(&inner, radius)?));
        }
        if ring < self.interference.len() {
            let outer = RingLoad { outer_pressure: 1.0, ..RingLoad::default() };
            stresses.push((ring, section.stress_at(&outer, radius)?));
        }
        Ok(stresses)
    }

    fn check_ranges(&self, loosest: &[f64], tightest: &[f64]) -> Result<(), MechanicsError> {
        for count in [loosest.len(), tightest.len()] {
            if count != self.interference.len() {
                return Err(self.no_such("interferences", count));
            }
        }
        for (loose, tight) in loosest.iter().zip(tightest) {
            check("loosest interference (m)", *loose, "at most the tightest", loose <= tight)?;
        }
        Ok(())
    }

    fn no_such(&self, what: &'static str, count: usize) -> MechanicsError {
        MechanicsError::WrongCount { what, count, rings: self.rings.len() }
    }
}

/// The corners of the interferences, searched for an extreme.
struct Ranges<'a> {
    stack: &'a Stack,
    loosest: &'a [f64],
    tightest: &'a [f64],
    quantity: StackQuantity,
    extreme: Extreme,
}

impl Ranges<'_> {
    fn at(&self, tight: Vec<bool>) -> Result<Governing, MechanicsError> {
        let ends = self.loosest.iter().zip(self.tightest).zip(&tight);
        let interference: Vec<f64> =
            ends.map(|((loosest, tightest), tight)| if *tight { *tightest } else { *loosest }).collect();
        let stack = Stack { interference, ..self.stack.clone() };
        let solution = stack.solve()?;
        let value = stack.value_of(self.quantity, &solution)?;
        Ok(Governing { tight, interference: stack.interference, solution, value })
    }

    /// All loose; for an equivalent stress also the corners that govern the stresses it is made of.
    fn other_starts(&self) -> Result<Vec<Vec<bool>>, MechanicsError> {
        let mut starts = vec![vec![false; self.loosest.len()]];
        if let StackQuantity::Stress { ring, radius, measure } = self.quantity
            && !measure.is_linear()
        {
            for measure in [StressMeasure::Radial, StressMeasure::Hoop] {
                let quantity = StackQuantity::Stress { ring, radius, measure };
                for extreme in [Extreme::Greatest, Extreme::Least] {
                    starts.push(self.stack.governing(self.loosest, self.tightest, quantity, extreme)?.tight);
                }
            }
        }
        Ok(starts)
    }

    fn climb(&self, start: Vec<bool>) -> Result<Governing, MechanicsError> {
        let mut best = self.at(start)?;
        for _ in 0..MAX_STEPS {
            let slopes = self.stack.sensitivities(self.quantity, &best.solution)?;
            let tight: Vec<bool> = slopes
                .iter()
                .zip(&best.tight)
                .map(|(slope, tight)| self.better_end(*slope, *tight))
                .collect();
            if tight == best.tight {
                break;
            }
            let next = self.at(tight)?;
            if !self.is_better(next.value, best.value) {
                break;
            }
            best = next;
        }
        Ok(best)
    }

    fn better_end(&self, slope: f64, now: bool) -> bool {
        match (slope == 0.0, self.extreme) {
            (true, _) => now,
            (false, Extreme::Greatest) => slope > 0.0,
            (false, Extreme::Least) => slope < 0.0,
        }
    }

    fn is_better(&self, value: f64, than: f64) -> bool {
        match self.extreme {
            Extreme::Greatest => value > than,
            Extreme::Least => value < than,
        }
    }
}

impl StressMeasure {
    /// The measure of a radial and a hoop stress, Pa.
    pub fn of(self, radial: f64, hoop: f64) -> f64 {
        match self {
            Self::Radial => radial,
            Self::Hoop => hoop,
            Self::VonMises => criteria::von_mises(radial, hoop),
            Self::Tresca => criteria::tresca(radial, hoop),
            Self::GreatestPrincipal => criteria::greatest_principal(radial, hoop),
            Self::Brittle { tension_share } => criteria::brittle(radial, hoop, tension_share),
        }
    }

    fn is_linear(self) -> bool {
        matches!(self, Self::Radial | Self::Hoop)
    }

    /// Derivatives by the radial and the hoop stress.
    fn slopes(self, radial: f64, hoop: f64) -> (f64, f64) {
        match self {
            Self::Radial => (1.0, 0.0),
            Self::Hoop => (0.0, 1.0),
            Self::VonMises => {
                let twice = 2.0 * criteria::von_mises(radial, hoop);
                if twice == 0.0 {
                    (0.0, 0.0)
                } else {
                    ((2.0 * radial - hoop) / twice, (2.0 * hoop - radial) / twice)
                }
            }
            Self::Tresca => {
                let greatest = criteria::tresca(radial, hoop);
                if (radial - hoop).abs() == greatest {
                    ((radial - hoop).signum(), (hoop - radial).signum())
                } else if hoop.abs() == greatest {
                    (0.0, hoop.signum())
                } else {
                    (radial.signum(), 0.0)
                }
            }
            Self::GreatestPrincipal if radial.max(hoop) <= 0.0 => (0.0, 0.0),
            Self::GreatestPrincipal if hoop >= radial => (0.0, 1.0),
            Self::GreatestPrincipal => (1.0, 0.0),
            Self::Brittle { tension_share } => {
                let least = radial.min(hoop);
                if criteria::greatest_principal(radial, hoop) >= -least * tension_share {
                    Self::GreatestPrincipal.slopes(radial, hoop)
                } else if hoop <= radial {
                    (0.0, -tension_share)
                } else {
                    (-tension_share, 0.0)
                }
            }
        }
    }
}
