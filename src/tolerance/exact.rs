//! Lengths as whole picometres, so that sums of tabulated values carry no rounding noise.
//!
//! Every value of ISO 286 (steps of 0.05 µm at the finest, ±IT/2 of grade IT01) and of ANSI B4.1 (steps of
//! 0.01 thousandth of an inch, 254 nm) is a whole number of picometres. Back in metres each length is the
//! floating-point number nearest to its decimal value: 21 µm is exactly the literal `21e-6`.

/// Picometres in a metre.
const PER_METRE: f64 = 1e12;
/// Picometres in a micrometre.
pub(super) const MICROMETRE: f64 = 1e6;
/// Picometres in a millimetre.
pub(super) const MILLIMETRE: f64 = 1e9;
/// Picometres in an inch, exactly 25.4 mm (international inch of 1959).
pub(super) const INCH: f64 = 25.4e9;
/// Picometres in a thousandth of an inch.
pub(super) const THOU: f64 = 25.4e6;
/// Longest length that is taken, m: beyond it a picometre is no longer exact in floating point.
const LONGEST: f64 = 1e3;

/// A length in metres to the nearest picometre; none when it is not finite or longer than a kilometre.
pub(super) fn picometres(metres: f64) -> Option<i64> {
    (metres.abs() <= LONGEST).then(|| (metres * PER_METRE).round() as i64)
}

/// The floating-point number of metres nearest to a length in picometres.
pub(super) fn metres(picometres: i64) -> f64 {
    picometres as f64 / PER_METRE
}

/// A decimal text in a unit of `unit` picometres.
pub(super) fn parse(text: &str, unit: f64) -> Option<i64> {
    let value: f64 = text.trim().parse().ok()?;
    picometres(value * unit / PER_METRE)
}

/// Difference of two sizes in metres to the femtometre, free of the noise of their last digits up to 4 m.
pub(super) fn size_difference(minuend: f64, subtrahend: f64) -> f64 {
    difference(minuend, subtrahend, 1e15)
}

/// Difference of two deviations in metres to a tenth of a femtometre, free of the noise of their last digits
/// up to 100 mm; the largest deviation of ISO 286 is 33 mm.
pub(super) fn deviation_difference(minuend: f64, subtrahend: f64) -> f64 {
    difference(minuend, subtrahend, 1e16)
}

fn difference(minuend: f64, subtrahend: f64, parts_per_metre: f64) -> f64 {
    ((minuend * parts_per_metre).round() - (subtrahend * parts_per_metre).round()) / parts_per_metre
}

/// A length in metres as millimetres for a message, such as `60 mm`.
pub(super) fn millimetres_text(metres: f64) -> String {
    format!("{} mm", plain(metres * 1e3, 9))
}

/// A length in metres as inches for a message, such as `2.5 in`.
pub(super) fn inches_text(metres: f64) -> String {
    format!("{} in", plain(metres / 0.0254, 6))
}

/// A length in metres as micrometres for a message, such as `2 µm`.
pub(super) fn micrometres_text(metres: f64) -> String {
    format!("{} µm", plain(metres * 1e6, 6))
}

/// A deviation in metres as micrometres with its sign, such as `+53 µm`; zero has none.
pub(super) fn deviation_text(metres: f64) -> String {
    let text = micrometres_text(metres);
    if metres > 0.0 { format!("+{text}") } else { text }
}

/// A number with at most `decimals` decimals and no trailing zeros.
fn plain(value: f64, decimals: usize) -> String {
    if !value.is_finite() || value.abs() >= 1e12 {
        return format!("{value:e}");
    }
    let text = format!("{value:.decimals$}");
    let text = if text.contains('.') { text.trim_end_matches('0').trim_end_matches('.') } else { &text };
    if text == "-0" { "0".to_owned() } else { text.to_owned() }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn decimal_lengths_come_back_as_their_literals() {
        assert_eq!(metres(parse("21", MICROMETRE).unwrap()), 21e-6);
        assert_eq!(metres(parse("0.15", MICROMETRE).unwrap()), 0.15e-6);
        assert_eq!(metres(parse("3150", MILLIMETRE).unwrap()), 3.15);
        // 0.01 thousandth of an inch is 254 nm, from 1 in = 25.4 mm exactly.
        assert_eq!(metres(parse("0.01", THOU).unwrap()), 254e-9);
        assert_eq!(metres(parse("4.73", INCH).unwrap()), 120.142e-3);
    }

    #[test]
    fn a_difference_carries_no_noise() {
        assert_ne!(60.012e-3 - 60e-3, 12e-6);
        assert_eq!(size_difference(60.012e-3, 60e-3), 12e-6);
        assert_eq!(size_difference(3.150_012, 3.15), 12e-6);
        assert_ne!(72e-6 - 30e-6, 42e-6);
        assert_eq!(deviation_difference(72e-6, 30e-6), 42e-6);
        assert_eq!(deviation_difference(33.005e-3, 5e-6), 33e-3);
        assert!(deviation_difference(f64::NAN, 0.0).is_nan());
    }

    #[test]
    fn what_is_not_a_length_is_not_taken() {
        assert_eq!(picometres(f64::NAN), None);
        assert_eq!(picometres(f64::INFINITY), None);
        assert_eq!(picometres(1001.0), None);
        assert_eq!(parse("", MICROMETRE), None);
    }

    #[test]
    fn lengths_are_written_without_trailing_zeros() {
        assert_eq!(millimetres_text(0.06), "60 mm");
        assert_eq!(inches_text(0.0635), "2.5 in");
        assert_eq!(deviation_text(53e-6), "+53 µm");
        assert_eq!(deviation_text(-7.5e-6), "-7.5 µm");
        assert_eq!(deviation_text(0.0), "0 µm");
        assert_eq!(deviation_text(-0.0), "0 µm");
        assert_eq!(millimetres_text(f64::NAN), "NaN mm");
    }
}
