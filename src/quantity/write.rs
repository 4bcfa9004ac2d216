//! SI number to text that reads back to it.

use super::read::parse;
use super::unit::{Kind, Scale, Unit, find};

/// Text of a quantity that [`parse`] reads back to exactly the same number, in the unit that fits its size.
///
/// Powers of ten are moved on the digits, so nothing is rounded. Units that are no power of ten of the SI unit
/// (degC, rpm, deg, h) are taken when fifteen digits in them read back to the same number; otherwise it is K,
/// rad/s, rad or s with all digits. A number that is not finite gives `not a number`, which is refused when it
/// is read; so is one above 1e15.
///
/// # Example
/// ```
/// use hubgrip::quantity::{Kind, parse, written};
/// assert_eq!(written(Kind::Length, 0.06), "60 mm");
/// assert_eq!(written(Kind::Temperature, 293.15), "20 degC");
/// let third = 1.0 / 3.0;
/// assert_eq!(parse(Kind::Pressure, &written(Kind::Pressure, third)), Ok(third));
/// ```
pub fn written(kind: Kind, si: f64) -> String {
    if !si.is_finite() {
        return "not a number".to_owned();
    }
    let [usual, exact] = units_for(kind, si).map(|name| find(kind, name));
    let text = usual.and_then(|unit| in_unit(unit, si)).or_else(|| exact.and_then(|unit| in_unit(unit, si)));
    text.unwrap_or_else(|| shifted(si, 0))
}

/// The unit that is usual for the size, and one that is a power of ten of the SI unit; none for a pure number.
fn units_for(kind: Kind, si: f64) -> [&'static str; 2] {
    let size = si.abs();
    let usual_or = |usual, exact| [usual, exact];
    let always = |name| [name, name];
    match kind {
        Kind::Number => always(""),
        Kind::Length if size != 0.0 && size < 1e-3 => always("um"),
        Kind::Length => always("mm"),
        Kind::Force if size >= 1e4 => always("kN"),
        Kind::Force => always("N"),
        Kind::Torque => always("N.m"),
        Kind::Pressure if size >= 1e10 => always("GPa"),
        Kind::Pressure => always("MPa"),
        Kind::Temperature => usual_or("degC", "K"),
        Kind::TemperatureDifference => always("K"),
        Kind::Speed => usual_or("rpm", "rad/s"),
        Kind::Velocity => always("mm/s"),
        Kind::Mass => always("kg"),
        Kind::Time if size >= 3600.0 => usual_or("h", "s"),
        Kind::Time => always("s"),
        Kind::Density => always("kg/m3"),
        Kind::Expansion => always("/K"),
        Kind::Conductivity => always("W/m.K"),
        Kind::SpecificHeat => always("J/kg.K"),
        Kind::HeatTransfer => always("W/m2.K"),
        Kind::Angle => usual_or("deg", "rad"),
        Kind::Volume => always("l"),
    }
}

/// The number in a unit, when that reads back to the same.
fn in_unit(unit: &Unit, si: f64) -> Option<String> {
    if let Scale::PowerOfTen(exponent) = unit.scale {
        return Some(format!("{} {}", shifted(si, -exponent), unit.name));
    }
    let rounded: f64 = format!("{:.14e}", unit.from_si(si)).parse().ok()?;
    let text = format!("{} {}", shifted(rounded, 0), unit.name);
    (parse(unit.kind, &text) == Ok(si)).then_some(text)
}

/// The shortest digits of a number, times a power of ten that is put in by moving the point.
fn shifted(number: f64, shift: i32) -> String {
    if number == 0.0 {
        return "0".to_owned();
    }
    let text = format!("{number:e}");
    let (mantissa, exponent) = text.split_once('e').unwrap_or((&text, "0"));
    let exponent = exponent.parse::<i32>().unwrap_or(0) + shift;
    if !(-4..15).contains(&exponent) {
        return format!("{mantissa}e{exponent}");
    }
    let (sign, mantissa) = mantissa.strip_prefix('-').map_or(("", mantissa), |digits| ("-", digits));
    format!("{sign}{}", with_point(&mantissa.replace('.', ""), exponent))
}

/// Digits of which the first counts ten to `exponent`, in plain decimals.
fn with_point(digits: &str, exponent: i32) -> String {
    let Ok(whole) = usize::try_from(exponent + 1) else {
        let zeros = usize::try_from(-exponent - 1).unwrap_or(0);
        return format!("0.{}{digits}", "0".repeat(zeros));
    };
    if whole == 0 {
        return format!("0.{digits}");
    }
    if digits.len() <= whole {
        return format!("{digits}{}", "0".repeat(whole - digits.len()));
    }
    let (whole, decimals) = digits.split_at(whole);
    format!("{whole}.{decimals}")
}
