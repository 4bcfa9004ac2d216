//! Temperature: where an interface loosens, and how a ring grows across which heat flows.

use super::error::MechanicsError;
use super::ring::{RingSection, check};
use super::stack::Stack;
use crate::numerics::root::bracketed;

/// Temperature rise of hub and shaft together at which a joint loosens, K; negative by cooling, none when the two
/// expand alike.
///
/// ΔT = δ/(d (α_h − α_s))
///
/// δ diametral interference (m), d joint diameter (m), α_h, α_s mean coefficient of linear expansion of hub and shaft
/// over the rise (1/K).
///
/// Free of the moduli and of the wall of the hub. Holds at rest, for coefficients that are constant over the rise; for
/// an expansion curve see [`Stack::loosening_temperature`]. A clearance has no such temperature and is refused.
///
/// Source: equal free growth of both faces; Timoshenko & Goodier, *Theory of Elasticity*, 3rd ed., chapter 13.
///
/// # Errors
/// An interference or diameter that is not positive, a coefficient that is not finite.
///
/// # Example
/// ```
/// let rise = hubgrip::mechanics::temperature::loosening_rise(50e-6, 0.05, 23e-6, 12e-6).unwrap().unwrap();
/// assert!((rise - 90.909091).abs() < 1e-6);
/// ```
pub fn loosening_rise(
    interference: f64,
    diameter: f64,
    hub_expansion: f64,
    shaft_expansion: f64,
) -> Result<Option<f64>, MechanicsError> {
    check("interference (m)", interference, "positive", interference > 0.0)?;
    check("joint diameter (m)", diameter, "positive", diameter > 0.0)?;
    for expansion in [hub_expansion, shaft_expansion] {
        check("coefficient of expansion (1/K)", expansion, "finite", true)?;
    }
    let difference = hub_expansion - shaft_expansion;
    Ok((difference != 0.0).then(|| interference / (diameter * difference)))
}

/// Temperature at a radius of a ring through which heat flows steadily, in the unit of the given temperatures.
///
/// T = Tₐ + (T_b − Tₐ) ln(r/a)/ln(b/a)
///
/// a, b, r inner, outer and any radius (m), Tₐ, T_b temperature of the inner and the outer face.
///
/// Holds for constant conductivity, no heat from within and none through the end faces. A solid ring without heat
/// from within is of one temperature.
///
/// Source: Carslaw & Jaeger, *Conduction of Heat in Solids*, 2nd ed., § 7.2.
///
/// # Errors
/// A radius outside the ring; a solid ring of two temperatures.
///
/// # Example
/// ```
/// use hubgrip::mechanics::{ring::RingSection, temperature};
/// let ring = RingSection::new(0.025, 0.100, 200e9, 0.3, 7800.0).unwrap();
/// let middle = temperature::steady_temperature(&ring, 400.0, 300.0, 0.050).unwrap();
/// assert!((middle - 350.0).abs() < 1e-9);
/// ```
pub fn steady_temperature(
    ring: &RingSection,
    inner_face: f64,
    outer_face: f64,
    radius: f64,
) -> Result<f64, MechanicsError> {
    let inside = radius >= ring.inner_radius() && radius <= ring.outer_radius();
    check("radius (m)", radius, "within the ring", inside)?;
    check_faces(ring, inner_face, outer_face)?;
    Ok(inner_face + (outer_face - inner_face) * ring.share_of_rise(radius))
}

/// Mean temperature over the section of a ring through which heat flows steadily, in the unit of the given temperatures.
///
/// T_m = 2/(b² − a²) ∫ T r dr = Tₐ + (T_b − Tₐ) ( b²/(b² − a²) − 1/(2 ln(b/a)) )
///
/// a, b inner and outer radius (m), Tₐ, T_b temperature of the inner and the outer face; T as in [`steady_temperature`],
/// with its validity and source.
///
/// # Errors
/// A temperature that is not finite; a solid ring of two temperatures.
///
/// # Example
/// ```
/// use hubgrip::mechanics::{ring::RingSection, temperature};
/// let ring = RingSection::new(0.025, 0.050, 200e9, 0.3, 7800.0).unwrap();
/// let mean = temperature::mean_temperature(&ring, 400.0, 300.0).unwrap();
/// assert!((mean - (400.0 - 100.0 * (4.0 / 3.0 - 0.5 / 2.0_f64.ln()))).abs() < 1e-9);
/// ```
pub fn mean_temperature(ring: &RingSection, inner_face: f64, outer_face: f64) -> Result<f64, MechanicsError> {
    // The mean over the area of anything that follows the logarithm of the radius.
    free_growth(ring, inner_face, outer_face)
}

/// Growth of bore and rim of a free ring over their radii, with heat flowing through it steadily.
///
/// u(a)/a = u(b)/b = 2/(b² − a²) ∫ ε r dr = εₐ + (ε_b − εₐ) ( b²/(b² − a²) − 1/(2 ln(b/a)) )
///
/// a, b inner and outer radius (m), u radial displacement (m), εₐ, ε_b free strain at the inner and the outer face.
///
/// Both faces follow the mean over the area, not the strain at the face. Holds in plane stress, for a strain linear
/// in the temperature and the temperature of [`steady_temperature`]. The stress is that of
/// [`RingSection::stress_at`].
///
/// Source: Timoshenko & Goodier, *Theory of Elasticity*, 3rd ed., chapter 13.
///
/// # Errors
/// A strain that is not finite; a solid ring of two strains.
///
/// # Example
/// ```
/// use hubgrip::mechanics::{ring::RingSection, temperature};
/// let ring = RingSection::new(0.025, 0.050, 200e9, 0.3, 7800.0).unwrap();
/// let growth = temperature::free_growth(&ring, 1.2e-3, 0.0).unwrap();
/// assert!((growth - 1.2e-3 * (1.0 - 4.0 / 3.0 + 0.5 / 2.0_f64.ln())).abs() < 1e-12);
/// ```
pub fn free_growth(ring: &RingSection, inner_strain: f64, outer_strain: f64) -> Result<f64, MechanicsError> {
    check_faces(ring, inner_strain, outer_strain)?;
    if ring.is_solid() {
        return Ok(inner_strain);
    }
    let (a, b) = (ring.inner_radius(), ring.outer_radius());
    let share = 2.0 * ring.share_moment(b) / ((b - a) * (b + a));
    Ok(inner_strain + (outer_strain - inner_strain) * share)
}

/// Intervals in which a temperature range is searched for the opening of an interface.
const INTERVALS: usize = 64;

impl Stack {
    /// The first temperature at which an interface opens on the way from one temperature to another; none when it
    /// stays closed. Temperatures in the unit of `free_strain`.
    ///
    /// `free_strain` gives the free strain of every ring, from the innermost outwards, at a temperature of the
    /// whole stack; it takes the place of the stack's own, so an expansion curve of any shape can be used. The way
    /// may go up or down. Speed and outside pressures stay those of the stack.
    ///
    /// Searched in 64 equal steps and then to the last bits by a bracketed root; an interface that opens and closes
    /// again within one step is not seen. Validity as in [`Stack::solve`].
    ///
    /// # Errors
    /// As [`Stack::solve`]; an interface that is not there; a strain that is not finite.
    ///
    /// # Example
    /// ```
    /// use hubgrip::mechanics::{ring::RingSection, stack::Stack};
    /// let stack = Stack {
    ///     rings: vec![
    ///         RingSection::new(0.0, 0.025, 200e9, 0.30, 7800.0).unwrap(),
    ///         RingSection::new(0.025, 0.050, 70e9, 0.33, 2700.0).unwrap(),
    ///     ],
    ///     interference: vec![50e-6],
    ///     free_strain: vec![0.0; 2],
    ///     ..Stack::default()
    /// };
    /// let strain = |kelvin: f64| vec![12e-6 * (kelvin - 293.15), 23e-6 * (kelvin - 293.15)];
    /// let loose = stack.loosening_temperature(0, strain, 293.15, 493.15).unwrap().unwrap();
    /// assert!((loose - 293.15 - 90.909091).abs() < 1e-6);
    /// ```
    pub fn loosening_temperature(
        &self,
        interface: usize,
        free_strain: impl Fn(f64) -> Vec<f64>,
        from: f64,
        to: f64,
    ) -> Result<Option<f64>, MechanicsError> {
        self.loosening_temperature_of(
            interface,
            |temperature| Ok(Self { free_strain: free_strain(temperature), ..self.clone() }),
            from,
            to,
        )
    }

    /// The first temperature at which an interface opens on the way from one temperature to another, for rings whose
    /// stiffness changes on the way too; none when it stays closed.
    ///
    /// `stack` gives this stack at a temperature: the free strains and the moduli of its rings. Two rings at rest open where
    /// their free faces part, whatever their moduli; of more rings each interface feels how stiff the others are. The
    /// search is that of [`Stack::loosening_temperature`].
    ///
    /// # Errors
    /// As [`Stack::loosening_temperature`], and those of `stack`.
    pub fn loosening_temperature_of(
        &self,
        interface: usize,
        stack: impl Fn(f64) -> Result<Self, MechanicsError>,
        from: f64,
        to: f64,
    ) -> Result<Option<f64>, MechanicsError> {
        let stiffness = self.influence()?.diagonal.get(interface).map(|flexibility| 1.0 / flexibility);
        let rings = self.rings.len();
        let wrong = MechanicsError::WrongCount { what: "interface numbers", count: interface, rings };
        let stiffness = stiffness.ok_or(wrong)?;
        let grip = |temperature: f64| -> Result<f64, MechanicsError> {
            let solution = stack(temperature)?.solve()?;
            Ok(solution.pressures[interface] - stiffness * solution.gaps[interface])
        };
        first_opening(grip, from, to)
    }
}

/// The first temperature at which two rings at rest part on the way from one temperature to another; none when they stay
/// closed.
///
/// `overlap` gives the diametral overlap of the free rings at a temperature (m), U + d (ε_s − ε_h): the moduli have no part in
/// it. Searched as in [`Stack::loosening_temperature`].
///
/// Source: equal free growth of both faces; Timoshenko & Goodier, *Theory of Elasticity*, 3rd ed., chapter 13.
///
/// # Errors
/// Those of `overlap`.
///
/// # Example
/// ```
/// use hubgrip::mechanics::temperature::parting_temperature;
/// let overlap = |kelvin: f64| Ok(50e-6 - 0.05 * (23e-6 - 12e-6) * (kelvin - 293.15));
/// let loose = parting_temperature(overlap, 293.15, 493.15).unwrap().unwrap();
/// assert!((loose - 293.15 - 90.909091).abs() < 1e-6);
/// ```
pub fn parting_temperature(
    overlap: impl Fn(f64) -> Result<f64, MechanicsError>,
    from: f64,
    to: f64,
) -> Result<Option<f64>, MechanicsError> {
    first_opening(overlap, from, to)
}

/// Where a grip that is signed, positive while it is closed, first goes through zero.
fn first_opening(
    grip: impl Fn(f64) -> Result<f64, MechanicsError>,
    from: f64,
    to: f64,
) -> Result<Option<f64>, MechanicsError> {
    let place = |step: usize| from + (to - from) * step as f64 / INTERVALS as f64;
    if grip(from)? <= 0.0 {
        return Ok(Some(from));
    }
    for step in 1..=INTERVALS {
        if grip(place(step))? < 0.0 {
            let signed = |temperature: f64| grip(temperature).unwrap_or(f64::NAN);
            return Ok(Some(bracketed(signed, place(step - 1), place(step), 0.0)?));
        }
    }
    Ok(None)
}

fn check_faces(ring: &RingSection, inner: f64, outer: f64) -> Result<(), MechanicsError> {
    check("temperature or strain of the inner face", inner, "finite", true)?;
    let allowed = !ring.is_solid() || inner == outer;
    check("temperature or strain of the outer face", outer, "that of the centre in a solid ring", allowed)
}
