//! SI numbers in the units that the names carry.

/// A number that JSON can carry; none when it is not finite. Zero has no sign.
pub(super) fn finite(value: f64) -> Option<f64> {
    value.is_finite().then_some(value + 0.0)
}

/// MPa of a stress or pressure in Pa.
pub(super) fn mega(pascals: f64) -> Option<f64> {
    finite(pascals * 1e-6)
}

/// GPa of a modulus in Pa, without the noise of the factor.
pub(super) fn giga(pascals: f64) -> f64 {
    settled(pascals * 1e-9, 1e9, 1e-12)
}

/// Last bits of a difference of two sizes below a metre, in µm: what remains of it when sizes are subtracted.
const NOISE_UM: f64 = 2e-10;

/// Micrometres of a length in m, without the noise that subtracting sizes adds to tabulated figures.
pub(super) fn microns(metres: f64) -> f64 {
    settled(metres * 1e6, 1e6, NOISE_UM)
}

/// Millimetres of a length in m, without the noise of the factor.
pub(super) fn millimetres(metres: f64) -> f64 {
    settled(metres * 1e3, 1e9, 1e-3 * NOISE_UM)
}

/// Degrees Celsius of a temperature in K, without the noise of the subtraction.
pub(super) fn celsius(kelvin: f64) -> f64 {
    settled(kelvin - 273.15, 1e9, 1e-12)
}

/// Revolutions per minute of an angular speed in rad/s, without the noise of the factor.
pub(super) fn rpm(radians_per_second: f64) -> f64 {
    let value = radians_per_second * 60.0 / std::f64::consts::TAU;
    settled(value, 1e6, 4.0 * f64::EPSILON * value.abs())
}

/// The closest multiple of 1/`parts` when it is within `noise`, else the value itself. Zero has no sign.
fn settled(value: f64, parts: f64, noise: f64) -> f64 {
    let rounded = (value * parts).round() / parts;
    let kept = if (value - rounded).abs() <= noise { rounded } else { value };
    kept + 0.0
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn tabulated_figures_come_out_as_printed() {
        assert_eq!(microns(53e-6 - 30e-6), 23.0);
        assert_eq!(microns(0.060061 - 0.060012), 49.0);
        assert_eq!(microns(-0.0), 0.0);
        assert_eq!(millimetres(0.0555625), 55.5625);
        assert_eq!(celsius(194.65), -78.5);
        assert_eq!(rpm(1450.0 * std::f64::consts::TAU / 60.0), 1450.0);
    }

    #[test]
    fn computed_figures_keep_every_digit() {
        for value in [1.0 / 3.0, 12.345678912345, 1e-7 / 3.0] {
            assert_eq!(microns(value * 1e-6), value * 1e-6 * 1e6);
        }
    }
}
