//! Press-in force against travel, the force to push out again, and the press to look for.

use std::f64::consts::PI;

use super::error::{AssemblyError, not_negative, positive, require};
use crate::material::Sourced;

/// Force along the travel of a press-in.
#[derive(Debug, Clone, PartialEq)]
pub struct PressCurve {
    /// Force at each travel, from first touch to the seated position and a little beyond.
    pub points: Vec<PressPoint>,
    /// Travel at which the lead-in chamfer has entered and the full interference grips, m.
    pub lead_in: f64,
    /// Greatest force, N.
    pub peak_force: f64,
    /// Travel at which it occurs, m.
    pub peak_travel: f64,
    /// Force when seated, N.
    pub final_force: f64,
    /// Work done to the seated position, J.
    pub work: f64,
}

/// Force at one travel.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PressPoint {
    /// Travel from first touch, m.
    pub travel: f64,
    /// Force, N.
    pub force: f64,
}

/// What a press-in is computed from.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PressInput {
    /// Contact pressure of the seated joint, Pa; zero when the parts do not grip.
    pub pressure: f64,
    /// Effective diametral interference at the temperature of pressing, m; greater than zero when there is a pressure.
    pub interference: f64,
    /// Diameter of the joint, m.
    pub diameter: f64,
    /// Engaged length, m.
    pub length: f64,
    /// Coefficient of friction while pressing, 0 to 1.
    pub friction: f64,
    /// Half-angle of the lead-in chamfer, rad; greater than 0 and not above π/4.
    pub chamfer_angle: f64,
}

/// Travel shown beyond the end of the curve, as a share of the joint length (for the picture only).
const TRAVEL_BEYOND: f64 = 0.02;

/// Force against travel for a press-in with a lead-in chamfer.
///
/// With s the travel from first touch, l_c the length of chamfer that is squeezed and K its wedge factor,
///
/// l_c = δ / (2 tan φ),  K = (μ + tan φ) / (1 − μ tan φ)
///
/// | travel | force |
/// |---|---|
/// | 0 ≤ s ≤ l_c | π d p K s² / (2 l_c) |
/// | l_c ≤ s ≤ L | π d p [K l_c/2 + μ (s − l_c)] |
/// | L ≤ s ≤ L + l_c | π d p [K (l_c² − (s − L)²)/(2 l_c) + μ (s − l_c)] |
/// | s ≥ L + l_c | μ p π d L |
///
/// The peak lies at s = L + l_c μ/K, while the chamfer leaves the joint; the work is counted to s = L. A
/// chamfer longer than the joint follows from the same disc-by-disc sum and is covered.
///
/// | symbol | meaning | unit | valid |
/// |---|---|---|---|
/// | p | contact pressure | Pa | p ≥ 0 |
/// | δ | effective diametral interference | m | δ > 0 when p > 0 |
/// | d, L | diameter and engaged length | m | > 0 |
/// | μ | friction while pressing | – | 0 … 1 |
/// | φ | half-angle of the chamfer | rad | 0 < φ ≤ π/4 |
///
/// Assumes a uniform pressure, proportional to the local interference along the chamfer, and elastic parts:
/// once a part yields, the peak force need not rise with the interference. A pressure of zero gives a curve
/// that is zero throughout. At least `points` points are returned: evenly spaced ones and every corner.
///
/// Source: equilibrium of a thin disc of the chamfered shaft; the plateau μ p π d L is the press-in force of
/// DIN 7190-1.
///
/// # Errors
/// [`AssemblyError::OutsideRange`] for an input outside the table above or fewer than two points.
///
/// # Example
/// ```
/// use hubgrip::assembly::press::{PressInput, press_curve};
/// let input = PressInput {
///     pressure: 75e6,
///     interference: 50e-6,
///     diameter: 0.05,
///     length: 0.04,
///     friction: 0.1,
///     chamfer_angle: 5f64.to_radians(),
/// };
/// let curve = press_curve(&input, 50).unwrap();
/// assert!((curve.peak_force - 47_194.6073).abs() < 1e-3);
/// assert!((curve.work - 941.734289).abs() < 1e-5);
/// ```
pub fn press_curve(input: &PressInput, points: usize) -> Result<PressCurve, AssemblyError> {
    require(points >= 2, "number of points", points as f64, "two or more")?;
    let lead = LeadIn::of(input)?;
    let peak_travel = lead.peak_travel();
    let travels = lead.travels(points);
    Ok(PressCurve {
        points: travels.into_iter().map(|travel| PressPoint { travel, force: lead.force(travel) }).collect(),
        lead_in: lead.length,
        peak_force: lead.force(peak_travel),
        peak_travel,
        final_force: lead.force(input.length + lead.length),
        work: lead.per_length * lead.reach_integral(input.length),
    })
}

/// Force at one travel (m), by the formulas of [`press_curve`].
///
/// # Errors
/// As [`press_curve`]; the travel must not be negative.
pub fn force_at(input: &PressInput, travel: f64) -> Result<f64, AssemblyError> {
    not_negative("travel (m)", travel)?;
    Ok(LeadIn::of(input)?.force(travel))
}

/// Greatest force while pressing in, N: at s = L + l_c μ/K, while the chamfer leaves the bore.
///
/// # Errors
/// As [`press_curve`].
///
/// # Example
/// ```
/// use hubgrip::assembly::press::{PressInput, peak_force};
/// let input = PressInput {
///     pressure: 75e6,
///     interference: 50e-6,
///     diameter: 0.05,
///     length: 0.04,
///     friction: 0.1,
///     chamfer_angle: 5f64.to_radians(),
/// };
/// assert!((peak_force(&input).unwrap() - 47194.6073).abs() < 1e-3);
/// ```
pub fn peak_force(input: &PressInput) -> Result<f64, AssemblyError> {
    let lead = LeadIn::of(input)?;
    Ok(lead.force(lead.peak_travel()))
}

/// Force at first movement when the joint is pushed out, F = μ p π d L, with the friction of release.
///
/// | symbol | meaning | unit | valid |
/// |---|---|---|---|
/// | p | contact pressure | Pa | ≥ 0 |
/// | d, L | diameter and engaged length | m | > 0 |
/// | μ | friction at release | – | 0 … 1 |
///
/// Source: equilibrium; DIN 7190-1 with the coefficient of axial release.
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// ```
/// let force = hubgrip::assembly::press::release_force(75e6, 0.05, 0.04, 0.12).unwrap();
/// assert!((force - 56_548.6678).abs() < 1e-3);
/// ```
pub fn release_force(pressure: f64, diameter: f64, length: f64, friction: f64) -> Result<f64, AssemblyError> {
    not_negative("contact pressure (Pa)", pressure)?;
    positive("joint diameter (m)", diameter)?;
    positive("joint length (m)", length)?;
    valid_friction(friction)?;
    Ok(friction * pressure * PI * diameter * length)
}

/// Margin of a press over the computed peak force: 25 % (common practice, no source).
pub const PRESS_MARGIN: f64 = 1.25;

/// Nominal force (N) of the press to look for: the peak with [`PRESS_MARGIN`], rounded up to the R10 series.
///
/// Presses are usually built in steps of the R10 preferred numbers (1, 1.25, 1.6, 2, 2.5, 3.15, 4, 5, 6.3,
/// 8 and their decades). The margin covers seizing, dirt and gauge error: common practice, no source. A peak
/// of zero or less needs no press: 0.
///
/// Source: ISO 3, Preferred numbers, series R10.
///
/// # Example
/// ```
/// assert_eq!(hubgrip::assembly::press::press_rating(47.2e3), 63e3);
/// ```
pub fn press_rating(peak_force: f64) -> f64 {
    const R10: [f64; 11] = [1.0, 1.25, 1.6, 2.0, 2.5, 3.15, 4.0, 5.0, 6.3, 8.0, 10.0];
    if peak_force <= 0.0 {
        return 0.0;
    }
    let wanted = peak_force * PRESS_MARGIN;
    if !wanted.is_finite() {
        return wanted;
    }
    let decade = 10f64.powi(wanted.log10().floor() as i32);
    R10.iter()
        .map(|step| step * decade)
        .find(|rating| *rating >= wanted * (1.0 - 1e-12))
        .unwrap_or(10.0 * decade)
}

/// Half-angle of the lead-in chamfer when none is given: 5°.
///
/// A steeper chamfer scrapes the surface: interference is then lost, not transmitted.
pub fn default_chamfer_angle() -> Sourced<f64> {
    Sourced::new(
        5f64.to_radians(),
        "lead-in chamfer of at most 5° on at least one part, usual for pressed joints; \
         DIN 7190-1 gives the same (from memory)",
    )
}

/// Advised axial length of the lead-in chamfer, m: the cube root of the diameter, both in mm.
///
/// Source: DIN 7190, from memory; 2 mm to 5 mm in practice.
///
/// # Errors
/// [`AssemblyError::OutsideRange`] when the diameter is not greater than zero.
///
/// # Example
/// ```
/// let length = hubgrip::assembly::press::advised_chamfer_length(0.05).unwrap();
/// assert!((length - 3.684e-3).abs() < 1e-6);
/// ```
pub fn advised_chamfer_length(diameter: f64) -> Result<f64, AssemblyError> {
    Ok((positive("joint diameter (m)", diameter)? * 1e3).cbrt() * 1e-3)
}

fn valid_friction(friction: f64) -> Result<f64, AssemblyError> {
    require((0.0..=1.0).contains(&friction), "coefficient of friction", friction, "between 0 and 1")
}

/// The chamfer, and the axial resistance that has come into the bore behind its front.
struct LeadIn {
    /// Squeezed length of the chamfer l_c, m.
    length: f64,
    /// Wedge factor K.
    wedge: f64,
    friction: f64,
    joint_length: f64,
    /// π d p, N/m.
    per_length: f64,
}

impl LeadIn {
    fn of(input: &PressInput) -> Result<Self, AssemblyError> {
        not_negative("contact pressure (Pa)", input.pressure)?;
        positive("joint diameter (m)", input.diameter)?;
        positive("joint length (m)", input.length)?;
        valid_friction(input.friction)?;
        let angle = input.chamfer_angle;
        require(
            angle > 0.0 && angle <= PI / 4.0,
            "half-angle of the lead-in chamfer (rad)",
            angle,
            "greater than 0 and not above 0.7854 (45°)",
        )?;
        let slope = angle.tan();
        let length = if input.pressure > 0.0 {
            positive("effective interference (m)", input.interference)? / (2.0 * slope)
        } else {
            0.0
        };
        Ok(Self {
            length,
            wedge: (input.friction + slope) / (1.0 - input.friction * slope),
            friction: input.friction,
            joint_length: input.length,
            per_length: PI * input.diameter * input.pressure,
        })
    }

    /// Resistance of the shaft from its front back to `x`, divided by π d p, m.
    fn reach(&self, x: f64) -> f64 {
        if x <= self.length {
            if self.length > 0.0 { self.wedge * x * x / (2.0 * self.length) } else { 0.0 }
        } else {
            self.wedge * self.length / 2.0 + self.friction * (x - self.length)
        }
    }

    /// Integral of [`Self::reach`] from 0 to `x`, m².
    fn reach_integral(&self, x: f64) -> f64 {
        if x <= self.length {
            return if self.length > 0.0 { self.wedge * x.powi(3) / (6.0 * self.length) } else { 0.0 };
        }
        let rest = x - self.length;
        self.wedge * self.length.powi(2) / 6.0
            + self.wedge * self.length * rest / 2.0
            + self.friction * rest * rest / 2.0
    }

    fn force(&self, travel: f64) -> f64 {
        let (full, chamfer) = (self.joint_length, self.length);
        if travel >= full + chamfer {
            return self.per_length * self.friction * full;
        }
        let left = (travel - full).max(0.0);
        self.per_length * (self.reach(travel) - self.reach(left))
    }

    fn peak_travel(&self) -> f64 {
        if self.per_length == 0.0 {
            return 0.0;
        }
        (self.joint_length + self.length * self.friction / self.wedge).max(self.length)
    }

    fn travels(&self, points: usize) -> Vec<f64> {
        let seated = self.joint_length + self.length;
        let end = seated + TRAVEL_BEYOND * self.joint_length;
        let mut travels: Vec<f64> = (0..points).map(|i| end * i as f64 / (points - 1) as f64).collect();
        travels.extend([self.length, self.joint_length, self.peak_travel(), seated]);
        travels.sort_by(f64::total_cmp);
        travels.dedup();
        travels
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;
    use proptest::prelude::*;

    fn input() -> PressInput {
        PressInput {
            pressure: 75e6,
            interference: 50e-6,
            diameter: 0.05,
            length: 0.04,
            friction: 0.1,
            chamfer_angle: 5f64.to_radians(),
        }
    }

    /// Simpson sum of the disc-by-disc force, without the closed form: the second way to each number.
    fn force_by_discs(input: &PressInput, travel: f64) -> f64 {
        let slope = input.chamfer_angle.tan();
        let chamfer = input.interference / (2.0 * slope);
        let wedge = (input.friction + slope) / (1.0 - input.friction * slope);
        let front = (travel - input.length).max(0.0);
        let discs = 400_000;
        let width = (travel - front) / f64::from(discs);
        let mut sum = 0.0;
        for disc in 0..discs {
            let x = front + (f64::from(disc) + 0.5) * width;
            sum += if x < chamfer { wedge * x / chamfer } else { input.friction } * width;
        }
        PI * input.diameter * input.pressure * sum
    }

    /// Values computed by hand from the equilibrium of a disc, d 50 mm, L 40 mm, p 75 MPa, μ 0.1, φ 5°.
    #[test]
    fn force_along_the_travel() {
        let curve = press_curve(&input(), 40).unwrap();
        assert_relative_eq!(curve.lead_in, 0.285_751_3e-3, max_relative = 1e-7);
        assert_relative_eq!(force_at(&input(), 1e-4).unwrap(), 38.990_090, max_relative = 1e-8);
        assert_relative_eq!(force_at(&input(), 0.02).unwrap(), 23_543.671_0, max_relative = 1e-8);
        assert_relative_eq!(curve.peak_force, 47_194.607_3, max_relative = 2e-9);
        assert_relative_eq!(curve.peak_travel, 40.151_076_5e-3, max_relative = 2e-9);
        assert_relative_eq!(curve.final_force, 47_123.889_8, max_relative = 2e-9);
        assert_relative_eq!(curve.work, 941.734_289, max_relative = 1e-9);
        assert!(curve.points.len() >= 40);
        assert!(curve.points.windows(2).all(|pair| pair[1].travel > pair[0].travel));
    }

    #[test]
    fn closed_form_agrees_with_the_sum_over_discs() {
        let long_chamfer = PressInput { interference: 0.02, ..input() };
        for (case, travel) in [
            (input(), 1e-4),
            (input(), 0.0401),
            (long_chamfer, 0.03),
            (long_chamfer, 0.08),
            (long_chamfer, 0.14),
        ] {
            let closed = force_at(&case, travel).unwrap();
            assert_relative_eq!(closed, force_by_discs(&case, travel), max_relative = 1e-5);
        }
    }

    #[test]
    fn work_is_the_integral_of_the_force() {
        for case in [input(), PressInput { interference: 0.02, ..input() }] {
            let steps = 200_000;
            let width = case.length / f64::from(steps);
            let sum: f64 =
                (0..steps).map(|i| force_at(&case, (f64::from(i) + 0.5) * width).unwrap() * width).sum();
            assert_relative_eq!(press_curve(&case, 2).unwrap().work, sum, max_relative = 1e-8);
        }
    }

    #[test]
    fn no_pressure_is_a_result_of_zeros() {
        let loose = PressInput { pressure: 0.0, interference: -10e-6, ..input() };
        let curve = press_curve(&loose, 10).unwrap();
        assert!(curve.points.iter().all(|point| point.force == 0.0));
        assert_eq!(
            [curve.lead_in, curve.peak_force, curve.peak_travel, curve.final_force, curve.work],
            [0.0; 5]
        );
    }

    #[test]
    fn without_friction_only_the_wedge_resists() {
        let slippery = PressInput { friction: 0.0, ..input() };
        let curve = press_curve(&slippery, 20).unwrap();
        assert_eq!(curve.final_force, 0.0);
        let wedge = PI * 0.05 * 75e6 * 50e-6 / 4.0;
        assert_relative_eq!(curve.peak_force, wedge, max_relative = 1e-12);
    }

    #[test]
    fn refuses_what_the_formula_does_not_cover() {
        for bad in [
            PressInput { pressure: -1.0, ..input() },
            PressInput { interference: 0.0, ..input() },
            PressInput { diameter: 0.0, ..input() },
            PressInput { length: f64::NAN, ..input() },
            PressInput { friction: 1.2, ..input() },
            PressInput { chamfer_angle: 0.0, ..input() },
            PressInput { chamfer_angle: 1.0, ..input() },
        ] {
            assert!(matches!(press_curve(&bad, 10), Err(AssemblyError::OutsideRange { .. })), "{bad:?}");
        }
        assert!(press_curve(&input(), 1).is_err());
        assert!(force_at(&input(), -1e-3).is_err());
        assert!(release_force(1e6, 0.05, 0.0, 0.1).is_err());
    }

    #[test]
    fn press_rating_goes_up_the_r10_series() {
        // ISO 3, R10: 63, 80, 100 kN; 47.2 kN with 25 % is 59.0 kN.
        assert_eq!(press_rating(47.2e3), 63e3);
        assert_eq!(press_rating(80e3), 100e3);
        assert_eq!(press_rating(80.001e3), 125e3);
        assert_eq!(press_rating(0.0), 0.0);
        assert!(press_rating(f64::NAN).is_nan());
    }

    #[test]
    fn advised_chamfer_is_the_cube_root_in_millimetres() {
        // 20, 50 and 100 mm give 2.7, 3.7 and 4.6 mm (cube-root rule of DIN 7190, from memory).
        for (diameter, length) in [(0.02, 2.7e-3), (0.05, 3.7e-3), (0.1, 4.6e-3)] {
            assert!((advised_chamfer_length(diameter).unwrap() - length).abs() < 0.05e-3);
        }
    }

    proptest! {
        #[test]
        fn no_travel_needs_more_than_the_peak(
            interference in 5e-6..200e-6_f64,
            length in 1e-4..0.1_f64,
            friction in 0.0..0.4_f64,
            degrees in 1.0..45.0_f64,
        ) {
            let case = PressInput { interference, length, friction, chamfer_angle: degrees.to_radians(), ..input() };
            let curve = press_curve(&case, 200).unwrap();
            for point in &curve.points {
                prop_assert!(point.force <= curve.peak_force * (1.0 + 1e-12));
                prop_assert!(point.force >= 0.0);
            }
        }
    }
}
