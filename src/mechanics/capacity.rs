//! What the grip carries: torque, axial force, both together.

use std::f64::consts::PI;

/// Axial force at slip, N: F = μ p π d l.
///
/// Pressure Pa, lengths m. Source: equilibrium; DIN 7190-1.
///
/// # Example
/// ```
/// let force = hubgrip::mechanics::capacity::axial(0.12, 75e6, 0.05, 0.04);
/// assert!((force - 56548.6678).abs() < 1e-4);
/// ```
pub fn axial(friction: f64, pressure: f64, diameter: f64, length: f64) -> f64 {
    friction * pressure * PI * diameter * length
}

/// Torque at slip, N·m: T = μ p π d² l/2.
///
/// Pressure Pa, lengths m. Source: equilibrium; DIN 7190-1.
///
/// # Example
/// ```
/// let torque = hubgrip::mechanics::capacity::torque(0.12, 75e6, 0.05, 0.04);
/// assert!((torque - 1413.71669).abs() < 1e-5);
/// ```
pub fn torque(friction: f64, pressure: f64, diameter: f64, length: f64) -> f64 {
    axial(friction, pressure, diameter, length) * diameter / 2.0
}

/// Safety against slip under torque and axial force together: 1/S = √((T/T_cap)² + (F/F_cap)²).
///
/// Zero when a load meets no capacity; infinite without load. Source: F. G. Kollmann,
/// *Welle-Nabe-Verbindungen* (1984): the friction force acts along the resultant.
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
