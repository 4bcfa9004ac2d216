//! What the grip carries: torque, axial force, both together.

use std::f64::consts::PI;

/// Axial force at slip, N.
///
/// F = μ p π d L
///
/// μ coefficient of friction along the joint, p mean contact pressure (Pa), d joint diameter (m), L joint length (m).
///
/// Holds for a pressure that is even along the joint, or its mean; slip of the whole seat at once. A long joint slips
/// from its loaded edge, so length beyond about 1.5 d adds little (common practice, no source). Source:
/// equilibrium; DIN 7190-1.
///
/// # Example
/// ```
/// let force = hubgrip::mechanics::capacity::axial(0.12, 75e6, 0.05, 0.04);
/// assert!((force - 56548.6678).abs() < 1e-4);
/// ```
pub fn axial(friction: f64, pressure: f64, diameter: f64, length: f64) -> f64 {
    friction * pressure * PI * diameter * length
}

/// Torque at slip, N·m.
///
/// T = μ p π d² L/2
///
/// μ coefficient of friction round the joint, p mean contact pressure (Pa), d joint diameter (m), L joint length (m).
///
/// Validity and source as [`axial`].
///
/// # Example
/// ```
/// let torque = hubgrip::mechanics::capacity::torque(0.12, 75e6, 0.05, 0.04);
/// assert!((torque - 1413.71669).abs() < 1e-5);
/// ```
pub fn torque(friction: f64, pressure: f64, diameter: f64, length: f64) -> f64 {
    axial(friction, pressure, diameter, length) * diameter / 2.0
}

/// Safety against slip under torque and axial force together.
///
/// 1/S = √( (T/T_c)² + (F/F_c)² )
///
/// S safety, T, F torque (N·m) and axial force (N) that act, T_c, F_c those at slip, each alone.
///
/// Zero when a load meets no capacity; infinite without load. The friction acts against the resultant of both loads;
/// with one coefficient round and along the joint that is √(F² + (2T/d)²) against μ p π d L. Bending does not lower
/// it while the edge does not gap ([`super::bending`]). Source: F. G. Kollmann, *Welle-Nabe-Verbindungen* (1984).
///
/// # Example
/// ```
/// let safety = hubgrip::mechanics::capacity::slip_safety(500.0, 5000.0, 1413.71669, 56548.6678);
/// assert!((safety - 2.74301330).abs() < 1e-7);
/// ```
pub fn slip_safety(torque: f64, axial_force: f64, torque_capacity: f64, axial_capacity: f64) -> f64 {
    let share = |load: f64, capacity: f64| if load == 0.0 { 0.0 } else { load / capacity };
    1.0 / share(torque, torque_capacity).hypot(share(axial_force, axial_capacity))
}
