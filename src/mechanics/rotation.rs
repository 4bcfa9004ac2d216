//! The speed at which an interface loosens.

use nalgebra::DVector;

use super::error::MechanicsError;
use super::influence::Influence;
use super::ring::{RingLoad, RingSection, check};
use super::stack::Stack;

/// Angular speed at which a hub on a shaft loosens, rad/s; none when speed does not loosen it.
///
/// ω = √( (δ/2) / (û_h − û_s) )
///
/// δ diametral interference at the temperature in service (m); û_h, û_s radial displacement of the free hub's bore
/// and the free shaft's surface by rotation, over the square of the angular speed (m s²), see
/// [`RingSection::displacement_at`]. For a solid shaft and a hub of one material ω = √(2 E δ/((3 + ν) ρ a b²)) with a
/// the joint radius and b the outer radius of the hub.
///
/// Up to there the pressure falls with ω². Where the shaft grows as much as the hub, speed never loosens the joint.
/// A clearance is loose at standstill. Holds for elastic rings in plane stress that turn at one speed; the speed may
/// lie beyond that at which a ring yields, so the stress at speed has to be seen as well.
///
/// Source: Timoshenko & Goodier, *Theory of Elasticity*, 3rd ed., § 32, for both rings.
///
/// # Errors
/// Rings that do not meet, an interference that is not finite.
///
/// # Example
/// ```
/// use hubgrip::mechanics::{ring::RingSection, rotation};
/// let shaft = RingSection::new(0.0, 0.025, 200e9, 0.3, 7800.0).unwrap();
/// let hub = RingSection::new(0.025, 0.050, 200e9, 0.3, 7800.0).unwrap();
/// let speed = rotation::loosening_speed(&shaft, &hub, 50e-6).unwrap().unwrap();
/// assert!((speed - 3525.9059).abs() < 1e-4);
/// ```
pub fn loosening_speed(
    shaft: &RingSection,
    hub: &RingSection,
    interference: f64,
) -> Result<Option<f64>, MechanicsError> {
    check("interference (m)", interference, "finite", true)?;
    let stack = Stack {
        rings: vec![*shaft, *hub],
        interference: vec![0.0],
        free_strain: vec![0.0; 2],
        ..Stack::default()
    };
    stack.influence()?;
    if interference <= 0.0 {
        return Ok(Some(0.0));
    }
    let turning = RingLoad { angular_speed: 1.0, ..RingLoad::default() };
    let growth = hub.displacement_at(&turning, hub.inner_radius())?
        - shaft.displacement_at(&turning, shaft.outer_radius())?;
    Ok((growth > 0.0).then(|| (0.5 * interference / growth).sqrt()))
}

impl Stack {
    /// The least angular speed at which each interface opens, rad/s; none where speed never opens it.
    ///
    /// g = M p + q₀ + ω² q₁, p ≥ 0, g ≥ 0, p g = 0, followed from ω = 0
    ///
    /// p contact pressure (Pa), g radial gap (m), M, q₀ influence matrix and free gaps at rest (see [`Influence`]), q₁
    /// free gap by rotation over ω² (m s²), ω angular speed (rad/s).
    ///
    /// Between two speeds at which an interface opens or closes every pressure and gap is linear in ω², so the next
    /// such speed is that of the first pressure or gap to reach zero, and the path of all of them is exact. An
    /// interface open at rest has the speed zero. The stack's own `angular_speed` is not used; its temperatures and
    /// outside pressures are. Validity as in [`loosening_speed`]; open rings stay concentric.
    ///
    /// Source: parametric linear complementarity, R. W. Cottle, J.-S. Pang & R. E. Stone, *The Linear Complementarity
    /// Problem* (1992), § 4.5 (from memory).
    ///
    /// # Errors
    /// As [`Stack::solve`]; a path with more events than a stack of this size can have in practice.
    ///
    /// # Example
    /// ```
    /// use hubgrip::mechanics::{ring::RingSection, stack::Stack};
    /// let steel = |inner, outer| RingSection::new(inner, outer, 200e9, 0.3, 7800.0).unwrap();
    /// let stack = Stack {
    ///     rings: vec![steel(0.0, 0.025), steel(0.025, 0.050)],
    ///     interference: vec![50e-6],
    ///     free_strain: vec![0.0; 2],
    ///     ..Stack::default()
    /// };
    /// let speeds = stack.loosening_speeds().unwrap();
    /// assert!((speeds[0].unwrap() - 3525.9059).abs() < 1e-4);
    /// ```
    pub fn loosening_speeds(&self) -> Result<Vec<Option<f64>>, MechanicsError> {
        let at_rest = Stack { angular_speed: 0.0, ..self.clone() };
        let by_rotation = Stack {
            rings: self.rings.clone(),
            interference: vec![0.0; self.interference.len()],
            free_strain: vec![0.0; self.rings.len()],
            angular_speed: 1.0,
            ..Stack::default()
        };
        let open = at_rest.solve()?.open;
        let path = Path { influence: at_rest.influence()?, direction: by_rotation.influence()?.free_gaps };
        Ok(path.openings(open)?.into_iter().map(|square| square.map(f64::sqrt)).collect())
    }
}

/// Free gaps q + s d that grow with s from zero.
struct Path {
    influence: Influence,
    direction: DVector<f64>,
}

impl Path {
    /// The least s at which each interface opens, from the open interfaces at s = 0.
    fn openings(&self, open: Vec<bool>) -> Result<Vec<Option<f64>>, MechanicsError> {
        let mut openings: Vec<Option<f64>> = open.iter().map(|open| open.then_some(0.0)).collect();
        let mut closed: Vec<bool> = open.into_iter().map(|open| !open).collect();
        let mut reached = 0.0;
        let steps = 16 * (closed.len() + 1);
        for _ in 0..steps {
            let Some((interface, next)) = self.next_event(&closed, reached) else {
                return Ok(openings);
            };
            reached = next;
            if closed[interface] {
                openings[interface].get_or_insert(reached);
            }
            closed[interface] = !closed[interface];
        }
        Err(MechanicsError::NotSettled { what: "the speed at which the rings loosen", steps })
    }

    /// The interface whose pressure or gap next reaches zero, and where; none when all grow or stay.
    fn next_event(&self, closed: &[bool], reached: f64) -> Option<(usize, f64)> {
        let pressures = self.influence.closing_pressures(closed);
        let pressure_slopes = self.influence.closing_pressures_from(&self.direction, closed);
        let gaps = self.influence.gaps(&pressures);
        let gap_slopes = self.influence.gaps_from(&self.direction, &pressure_slopes);
        let zero_of = |k: usize| {
            let (value, slope) =
                if closed[k] { (pressures[k], pressure_slopes[k]) } else { (gaps[k], gap_slopes[k]) };
            (slope < 0.0).then(|| (-value / slope).max(reached))
        };
        (0..closed.len())
            .filter_map(|k| zero_of(k).map(|zero| (k, zero)))
            .filter(|(_, zero)| zero.is_finite())
            .min_by(|a, b| a.1.total_cmp(&b.1))
    }
}
