//! Friction and interference inferred back from a record.

use super::line_fit::line;
use super::trace::{Point, gathered};
use super::window::{SLOPE_OVER, Window, force_on};

/// A value with the limits it lies between.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Bounded {
    /// The best value.
    pub best: f64,
    /// Least it may be.
    pub low: f64,
    /// Greatest it may be.
    pub high: f64,
}

/// What a record tells of friction and pressure.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Inferred {
    /// Friction times contact pressure, Pa: the one thing that is seen.
    pub product: Bounded,
    /// Friction while pressing, over the pressures the parts may have.
    pub friction: Bounded,
    /// Contact pressure, Pa, over the friction of the joint file.
    pub pressure: Bounded,
    /// Interference that grips, m, over the friction of the joint file.
    pub interference: Bounded,
    /// Whether both parts were measured, so that the friction is known as well as their sizes are.
    pub measured: bool,
}

/// Blocks of the slope; their scatter, not that of the rows, says how well it is known, as rows beside each other
/// waver together.
const BLOCKS: usize = 20;
/// Standard errors to each side of the slope: 3, with 20 blocks about 99 % sure (Student's t, 18 degrees of freedom).
const ERRORS: f64 = 3.0;

/// Infers μ p, then μ and p, from a curve counted from first touch.
///
/// The force of the record is F = a + k F_u with F_u the curve of the tightest pair at the high friction, between 20 % and
/// 90 % of the engaged length. For a joint of one section F_u climbs by π d μ_u p_u for each length, so that
///
/// μ p = k μ_u p_u,  μ = μ p / p,  p = μ p / μ
///
/// | symbol | meaning | unit |
/// |---|---|---|
/// | μ p | friction times contact pressure of the record | Pa |
/// | μ_u, p_u | high friction and tightest pressure of the joint | –, Pa |
///
/// The constant a takes what chamfer and zero of the load cell add, so that neither disturbs. The limits of μ p are
/// three standard errors of the slope and `force_uncertainty` (a share of the reading) together. The limits of the
/// friction are μ p over the greatest and the least pressure that the parts may have: those of the extreme pairs, which for two
/// measured parts are their sizes with their uncertainty. The limits of pressure and interference are those of μ p over
/// the ends of the friction range. They are worst cases, not standard deviations.
///
/// Assumes that friction and pressure stay the same along the travel and that the parts are elastic, where the pressure
/// follows the interference in a straight line.
///
/// Source: equilibrium, as for [`crate::assembly::press::press_curve`]; JCGM 100:2008 (GUM) for the standard error.
///
/// None when the record does not cover that travel, or its force does not climb.
pub fn infer(window: &Window, from_touch: &[Point], force_uncertainty: f64) -> Option<Inferred> {
    let (from, to) = (SLOPE_OVER.0 * window.length, SLOPE_OVER.1 * window.length);
    let blocks: Vec<(f64, f64)> = gathered(from_touch, from, to, BLOCKS)
        .iter()
        .map(|block| (force_on(&window.upper, block.travel), block.force))
        .collect();
    if blocks.len() < BLOCKS / 2 {
        return None;
    }
    let line = line(&blocks).filter(|line| line.slope > 0.0)?;
    let tightest = window.friction.high * window.pressure.tightest;
    let spread = ERRORS * line.slope_error;
    let product = Bounded {
        best: line.slope * tightest,
        low: (line.slope - spread).max(0.0) * tightest * (1.0 - force_uncertainty),
        high: (line.slope + spread) * tightest * (1.0 + force_uncertainty),
    };
    let friction = over(product, window.pressure.mean, window.pressure.loosest, window.pressure.tightest);
    let middle = 0.5 * (window.friction.low + window.friction.high);
    let pressure = over(product, middle, window.friction.low, window.friction.high);
    let interference = |pressure: f64| interference_at(window, pressure);
    Some(Inferred {
        product,
        friction,
        pressure,
        interference: Bounded {
            best: interference(pressure.best),
            low: interference(pressure.low),
            high: interference(pressure.high),
        },
        measured: window.measured,
    })
}

/// A quotient whose divisor lies between two limits; without end when the divisor may be zero.
fn over(value: Bounded, middle: f64, least: f64, greatest: f64) -> Bounded {
    let part = |value: f64, divisor: f64| if divisor > 0.0 { value / divisor } else { f64::INFINITY };
    Bounded { best: part(value.best, middle), low: part(value.low, greatest), high: part(value.high, least) }
}

/// Interference that gives a pressure, m: along the line through the loosest and the tightest pair, or through the pair
/// that only just touches at the shop temperature.
fn interference_at(window: &Window, pressure: f64) -> f64 {
    let (p, u) = (window.pressure, window.interference);
    if p.loosest > 0.0 && p.tightest > p.loosest * (1.0 + 1e-9) {
        return u.loosest + (u.tightest - u.loosest) * (pressure - p.loosest) / (p.tightest - p.loosest);
    }
    u.tightest - window.shop_interference * (1.0 - pressure / p.tightest)
}
