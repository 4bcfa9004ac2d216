//! Around the press: its size in the trade's units, what the work turns into, what gives way first.

use std::f64::consts::PI;

use super::error::{AssemblyError, not_negative, positive, require};
use super::press::{press_rating, release_force};
use crate::material::Range;

/// One metric ton-force, N: 1000 kg times the standard acceleration 9.80665 m/s² (exact).
pub const METRIC_TON_FORCE: f64 = 9806.65;

/// One US ton-force, N: 2000 lb of 0.45359237 kg times 9.80665 m/s² (exact).
pub const US_TON_FORCE: f64 = 2000.0 * 0.453_592_37 * 9.806_65;

/// Size of the press to look for.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PressSize {
    /// Nominal force, N, in the R10 series with the margin of [`press_rating`].
    pub force: f64,
    /// The same in metric tons-force.
    pub metric_tons: f64,
    /// The same in US tons-force of 2000 lbf.
    pub us_tons: f64,
}

/// Size of the press for a computed peak force (N).
///
/// # Example
/// ```
/// let press = hubgrip::assembly::press_practice::press_size(47.2e3);
/// assert_eq!(press.force, 63e3);
/// assert!((press.us_tons - 7.08).abs() < 0.01);
/// ```
pub fn press_size(peak_force: f64) -> PressSize {
    let force = press_rating(peak_force);
    PressSize { force, metric_tons: force / METRIC_TON_FORCE, us_tons: force / US_TON_FORCE }
}

/// Rough warming of the seat by the work of pressing.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PressHeating {
    /// Rise at the interface at the end of the stroke, K.
    pub interface_rise: f64,
    /// Rise of the whole mass once it is even, K.
    pub even_rise: f64,
}

/// What the work of pressing is computed from.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PressWork {
    /// Work of pressing, J.
    pub work: f64,
    /// Mass that takes up the heat: hub and engaged shaft, kg.
    pub mass: f64,
    /// Contact pressure, Pa.
    pub pressure: f64,
    /// Coefficient of friction while pressing.
    pub friction: f64,
    /// Engaged length, m.
    pub length: f64,
    /// Press speed, m/s.
    pub speed: f64,
    /// Conductivity of both parts, W/(m·K).
    pub conductivity: f64,
    /// Density of both parts, kg/m³.
    pub density: f64,
    /// Specific heat of both parts, J/(kg·K).
    pub specific_heat: f64,
}

/// Rough warming of the seat by the work of pressing, both parts of like metal.
///
/// ΔT(interface) = μ p v √(t/(π k ρ c)),  t = L/v;  ΔT(even) = W/(M c)
///
/// Friction heats the first point of the seat for the whole stroke; half of the heat goes into each part, as into a
/// half-space under a constant heat flux. A rough figure: it holds while the heat has not crossed the wall,
/// √(κ t) below about a third of it, and for small rises.
///
/// | symbol | meaning | unit | valid |
/// |---|---|---|---|
/// | W, M | work of pressing, mass of both parts | J, kg | ≥ 0, > 0 |
/// | μ, p, v, L | friction, contact pressure, press speed, length | –, Pa, m/s, m | μ, p ≥ 0; v, L > 0 |
/// | k, ρ, c | conductivity, density, specific heat | W/(m·K), kg/m³, J/(kg·K) | > 0 |
///
/// Source: H. S. Carslaw and J. C. Jaeger, *Conduction of Heat in Solids*, section 2.9; heat balance.
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// ```
/// use hubgrip::assembly::press_practice::{PressWork, press_heating};
/// let steel = PressWork {
///     work: 942.0,
///     mass: 2.5,
///     pressure: 75e6,
///     friction: 0.1,
///     length: 0.04,
///     speed: 0.002,
///     conductivity: 50.0,
///     density: 7850.0,
///     specific_heat: 470.0,
/// };
/// let heating = press_heating(&steel).unwrap();
/// assert!(heating.interface_rise < 5.0 && heating.even_rise < 1.0);
/// ```
pub fn press_heating(press: &PressWork) -> Result<PressHeating, AssemblyError> {
    not_negative("work of pressing (J)", press.work)?;
    not_negative("contact pressure (Pa)", press.pressure)?;
    not_negative("coefficient of friction", press.friction)?;
    positive("mass (kg)", press.mass)?;
    positive("joint length (m)", press.length)?;
    positive("press speed (m/s)", press.speed)?;
    positive("conductivity (W/(m·K))", press.conductivity)?;
    positive("density (kg/m³)", press.density)?;
    positive("specific heat (J/(kg·K))", press.specific_heat)?;
    let heat_flux = press.friction * press.pressure * press.speed;
    let time = press.length / press.speed;
    let effusivity = (press.conductivity * press.density * press.specific_heat).sqrt();
    Ok(PressHeating {
        interface_rise: heat_flux * (time / PI).sqrt() / effusivity,
        even_rise: press.work / (press.mass * press.specific_heat),
    })
}

/// Mean compressive stress on a ring-shaped or round face that takes the press force, Pa: σ = 4F/(π (D² − d²)).
///
/// `outer` and `inner` (m) bound the area that the press tool really touches, chamfers taken off. Compare with the
/// yield strength; a face that is not square to the axis sees several times the mean on one side.
///
/// Source: equilibrium.
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// ```
/// let stress = hubgrip::assembly::press_practice::face_stress(47.2e3, 0.048, 0.0).unwrap();
/// assert!((stress - 26.08e6).abs() < 0.01e6);
/// ```
pub fn face_stress(force: f64, outer: f64, inner: f64) -> Result<f64, AssemblyError> {
    not_negative("press force (N)", force)?;
    not_negative("inner diameter of the face (m)", inner)?;
    positive("width of the face (m)", outer - inner)?;
    Ok(4.0 * force / (PI * (outer * outer - inner * inner)))
}

/// How the ends of a pin are held while it is pressed in.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum EndHold {
    /// One end held fast, the other free to move aside: nothing guides the ram's end.
    FixedFree,
    /// Both ends free to tilt.
    Rounded,
    /// One end held fast, the other guided but free to tilt.
    FixedRounded,
    /// Both ends held fast.
    Fixed,
}

impl EndHold {
    /// Constant of the end condition as recommended for design: ¼, 1, 1.2 and 1.2 (theory: ¼, 1, 2 and 4).
    ///
    /// Source: R. G. Budynas and J. K. Nisbett, *Shigley's Mechanical Engineering Design*, table 4-2 (from memory).
    pub fn constant(self) -> f64 {
        match self {
            Self::FixedFree => 0.25,
            Self::Rounded => 1.0,
            Self::FixedRounded | Self::Fixed => 1.2,
        }
    }
}

/// A slender pin or bush under the press force.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Pin {
    /// Outer diameter, m.
    pub outer_diameter: f64,
    /// Inner diameter, m; zero for a solid pin.
    pub inner_diameter: f64,
    /// Free length at the start of the stroke, m.
    pub free_length: f64,
    /// Young's modulus, Pa.
    pub youngs_modulus: f64,
    /// Yield strength in compression, Pa.
    pub yield_strength: f64,
    /// How its ends are held.
    pub ends: EndHold,
}

/// Force at which a pin buckles or yields, and which of the two formulas gave it.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Buckling {
    /// Critical force, N.
    pub force: f64,
    /// Free length over radius of gyration.
    pub slenderness: f64,
    /// True when Euler's formula governs, false when Johnson's does.
    pub is_euler: bool,
}

/// Force at which a straight pin under a central press force gives way.
///
/// With the slenderness λ = l/i, i = √(D² + d²)/4, and λ₁ = √(2π² C E/S_y),
///
/// Euler, λ ≥ λ₁: F = A C π² E/λ²;  Johnson, λ < λ₁: F = A [S_y − (S_y λ/(2π))²/(C E)]
///
/// | symbol | meaning | unit | valid |
/// |---|---|---|---|
/// | D, d | outer and inner diameter | m | 0 ≤ d < D |
/// | l | free length | m | > 0 |
/// | E, S_y | Young's modulus, yield strength in compression | Pa | > 0 |
/// | C | constant of the end condition | – | [`EndHold::constant`] |
///
/// Assumes a straight pin and a central force; pressing off the axis needs a margin of its own.
///
/// Source: R. G. Budynas and J. K. Nisbett, *Shigley's Mechanical Engineering Design*, chapter 4, columns with
/// central loading.
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// ```
/// use hubgrip::assembly::press_practice::{EndHold, Pin, buckling_force};
/// let pin = Pin {
///     outer_diameter: 0.006,
///     inner_diameter: 0.0,
///     free_length: 0.05,
///     youngs_modulus: 210e9,
///     yield_strength: 600e6,
///     ends: EndHold::Rounded,
/// };
/// let limit = buckling_force(&pin).unwrap();
/// assert!(!limit.is_euler && limit.force < 600e6 * 2.83e-5);
/// ```
pub fn buckling_force(pin: &Pin) -> Result<Buckling, AssemblyError> {
    not_negative("inner diameter (m)", pin.inner_diameter)?;
    positive("wall of the pin (m)", pin.outer_diameter - pin.inner_diameter)?;
    positive("free length (m)", pin.free_length)?;
    let modulus = positive("Young's modulus (Pa)", pin.youngs_modulus)?;
    let yield_strength = positive("yield strength (Pa)", pin.yield_strength)?;
    let (outer, inner) = (pin.outer_diameter, pin.inner_diameter);
    let area = PI / 4.0 * (outer * outer - inner * inner);
    let slenderness = pin.free_length / ((outer * outer + inner * inner).sqrt() / 4.0);
    let constant = pin.ends.constant();
    let is_euler = slenderness >= (2.0 * PI * PI * constant * modulus / yield_strength).sqrt();
    let stress = if is_euler {
        constant * PI * PI * modulus / (slenderness * slenderness)
    } else {
        yield_strength - (yield_strength * slenderness / (2.0 * PI)).powi(2) / (constant * modulus)
    };
    Ok(Buckling { force: area * stress, slenderness, is_euler })
}

/// Forces to push a joint apart after it has rested, N.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PushOut {
    /// At first movement, over the range of the release friction.
    pub first_movement: Range,
    /// Once it slides with the whole seat still engaged, over the range of the pressing friction.
    pub sliding: Range,
    /// Press to look for, N: for the greater of the two.
    pub press: f64,
}

/// Forces to push a joint apart after it has rested.
///
/// Both are μ p π d L. A joint at rest holds on harder than one in motion: the oil film is squeezed out and the
/// surfaces key into each other, which is in the release friction given, not in the formula. Sliding, the force falls
/// with the length still engaged.
///
/// Source: equilibrium; DIN 7190-1 for the two coefficients.
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// ```
/// use hubgrip::assembly::press_practice::push_out;
/// use hubgrip::material::Range;
/// let (release, sliding) = (Range { low: 0.10, high: 0.18 }, Range { low: 0.08, high: 0.14 });
/// let forces = push_out(75e6, 0.05, 0.04, release, sliding).unwrap();
/// assert!(forces.first_movement.high > forces.sliding.high);
/// assert_eq!(forces.press, 125e3);
/// ```
pub fn push_out(
    pressure: f64,
    diameter: f64,
    length: f64,
    release: Range,
    sliding: Range,
) -> Result<PushOut, AssemblyError> {
    let forces = |friction: Range| -> Result<Range, AssemblyError> {
        require(
            friction.low <= friction.high,
            "low end of the friction range",
            friction.low,
            "no greater than its high end",
        )?;
        Ok(Range {
            low: release_force(pressure, diameter, length, friction.low)?,
            high: release_force(pressure, diameter, length, friction.high)?,
        })
    };
    let (first_movement, sliding) = (forces(release)?, forces(sliding)?);
    Ok(PushOut { first_movement, sliding, press: press_rating(first_movement.high.max(sliding.high)) })
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    fn column(diameter: f64, length: f64) -> Pin {
        Pin {
            outer_diameter: diameter,
            inner_diameter: 0.0,
            free_length: length,
            youngs_modulus: 207e9,
            yield_strength: 500e6,
            ends: EndHold::Rounded,
        }
    }

    /// Shigley's Mechanical Engineering Design, column example (recalled): 22 kN with a design factor of 4, pinned,
    /// S_y 500 MPa, E 207 GPa: 1.5 m long needs 37.48 mm (Euler), 375 mm long 19.02 mm (Johnson).
    #[test]
    fn columns_of_the_textbook() {
        let long = buckling_force(&column(0.037_48, 1.5)).unwrap();
        assert!(long.is_euler);
        assert_relative_eq!(long.force, 88e3, max_relative = 1e-3);
        let short = buckling_force(&column(0.019_02, 0.375)).unwrap();
        assert!(!short.is_euler);
        assert_relative_eq!(short.force, 88e3, max_relative = 1e-3);
    }

    #[test]
    fn euler_and_johnson_meet_at_half_the_yield_strength() {
        let limit = (2.0 * PI * PI * 207e9_f64 / 500e6).sqrt();
        let length = |slenderness: f64| slenderness * 0.01 / 4.0;
        let at = |slenderness| buckling_force(&column(0.01, length(slenderness))).unwrap();
        let half = 250e6 * PI / 4.0 * 1e-4;
        assert_relative_eq!(at(limit * (1.0 - 1e-9)).force, half, max_relative = 1e-6);
        assert_relative_eq!(at(limit * (1.0 + 1e-9)).force, half, max_relative = 1e-6);
        assert!(buckling_force(&Pin { inner_diameter: 0.01, ..column(0.01, 0.1) }).is_err());
    }

    #[test]
    fn tons_are_those_of_the_definitions() {
        // NIST SP 811: 1 ton-force (2000 lbf) = 8.896443 kN; 1 metric ton-force = 9.80665 kN.
        assert_relative_eq!(US_TON_FORCE, 8_896.443_230_521, max_relative = 1e-12);
        let press = press_size(1.0e6);
        assert_relative_eq!(press.force, 1.25e6, max_relative = 1e-12);
        assert_relative_eq!(press.metric_tons, 127.46, max_relative = 1e-4);
    }

    /// Applied Science for Metal Workers (about 1919), rule for forced fits: 15 D + 15 tons, D in inches. The rule
    /// knows neither length nor hub; a 9 in crank pin 9 in long with 0.0015 in/in in a steel centre of twice the
    /// diameter, friction 0.06 to 0.15, brackets it: a plausibility check, no more.
    #[test]
    fn old_shop_rule_lies_within_the_friction_range() {
        let rule = (15.0 * 9.0 + 15.0) * US_TON_FORCE;
        assert_relative_eq!(rule, 150.0 * 8896.443, max_relative = 1e-6);
        // Lamé, one material, solid shaft: p = E ξ (1 − Q²)/2 with ξ = 0.0015, Q = 0.5.
        let pressure = 200e9 * 0.0015 * 0.75 / 2.0;
        let force = |friction| release_force(pressure, 9.0 * 0.0254, 9.0 * 0.0254, friction).unwrap();
        assert!(force(0.06) < rule && rule < force(0.15), "{} {} {}", force(0.06), rule, force(0.15));
    }

    #[test]
    fn interface_rise_is_that_of_two_half_spaces() {
        // Explicit check of the square-root law: four times the length at one speed doubles the rise.
        let press = PressWork {
            work: 942.0,
            mass: 2.5,
            pressure: 75e6,
            friction: 0.1,
            length: 0.04,
            speed: 0.002,
            conductivity: 50.0,
            density: 7850.0,
            specific_heat: 470.0,
        };
        let one = press_heating(&press).unwrap();
        let four = press_heating(&PressWork { length: 0.16, ..press }).unwrap();
        assert_relative_eq!(four.interface_rise, 2.0 * one.interface_rise, max_relative = 1e-12);
        // By hand: q = 0.1·75e6·0.002 = 15 kW/m², t = 20 s, √(k ρ c) = 13 582: 15e3·√(20/π)/13 582 = 2.787 K.
        assert_relative_eq!(one.interface_rise, 2.787, max_relative = 1e-3);
        assert_relative_eq!(one.even_rise, 942.0 / 1175.0, max_relative = 1e-12);
        assert!(press_heating(&PressWork { speed: 0.0, ..press }).is_err());
    }

    #[test]
    fn refuses_a_face_without_area_and_a_range_upside_down() {
        assert!(face_stress(1e3, 0.05, 0.05).is_err());
        let (up, down) = (Range { low: 0.1, high: 0.2 }, Range { low: 0.2, high: 0.1 });
        assert!(push_out(75e6, 0.05, 0.04, down, up).is_err());
    }
}
