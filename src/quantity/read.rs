//! Text to SI number.

use super::error::QuantityError;
use super::scan::{self, Scan, Written};
use super::unit::{self, Kind, Scale, Unit};
use crate::diagnostic::did_you_mean;

/// Longest part of a text that an error repeats, in characters.
const SHOWN: usize = 60;

/// The SI number of a quantity written with its unit.
///
/// Length in m, force in N, torque in N·m, pressure in Pa, temperature in K, speed in rad/s, mass in kg, time
/// in s, angle in rad; the other kinds as [`Kind`] says.
///
/// # Errors
/// Any text that is not a number with a unit of the kind; the message names the units that are.
///
/// # Example
/// ```
/// use hubgrip::quantity::{Kind, parse};
/// assert_eq!(parse(Kind::Temperature, "20 degC"), Ok(293.15));
/// assert_eq!(parse(Kind::Length, "1.5 in"), Ok(0.0381));
/// assert!(parse(Kind::Length, "60 MPa").unwrap_err().to_string().contains("a length is due"));
/// ```
pub fn parse(kind: Kind, text: &str) -> Result<f64, QuantityError> {
    let (written, number, unit_text) = split(kind, text)?;
    if kind == Kind::Number {
        return if unit_text.is_empty() {
            finite(kind, text, written.times_ten_to(0))
        } else {
            Err(QuantityError::UnitNotDue { given: shown(text) })
        };
    }
    if unit_text.is_empty() {
        return Err(QuantityError::NoUnit { kind, given: shown(number) });
    }
    let unit = find_unit(kind, text, unit_text)?;
    value(kind, text, &written, unit)
}

/// A pure number.
///
/// # Errors
/// Anything else, a unit behind the number, NaN and infinity.
pub fn parse_number(text: &str) -> Result<f64, QuantityError> {
    parse(Kind::Number, text)
}

/// The number, its text, and the text of the unit.
pub(super) fn split(kind: Kind, text: &str) -> Result<(Written, &str, &str), QuantityError> {
    if text.trim().is_empty() {
        return Err(QuantityError::Empty { kind });
    }
    match scan::number(text) {
        Scan::Found(written, number, unit) => Ok((written, number, unit)),
        Scan::Grouped(given, meant) => Err(QuantityError::NotPlainDecimal {
            given: shown(&given),
            meant: meant.map(|meant| shown(&meant)),
        }),
        Scan::NotFinite => Err(QuantityError::NotFinite { kind, given: shown(text) }),
        Scan::Missing => Err(QuantityError::NoNumber { kind, given: shown(text) }),
    }
}

/// The unit of a kind, or what the spelling is instead.
pub(super) fn find_unit(kind: Kind, text: &str, unit_text: &str) -> Result<&'static Unit, QuantityError> {
    let spelling = unit::plain_spelling(unit_text);
    if let Some(unit) = unit::find(kind, &spelling) {
        return Ok(unit);
    }
    let other = Kind::ALL.into_iter().find(|other| unit::find(*other, &spelling).is_some());
    Err(match other {
        Some(found) => QuantityError::WrongKind { kind, given: shown(text), found },
        None => {
            let near = did_you_mean(&spelling, kind.units().map(|unit| unit.name));
            QuantityError::UnknownUnit { kind, unit: shown(unit_text), near }
        }
    })
}

/// The SI number of a number in a unit.
pub(super) fn value(kind: Kind, text: &str, written: &Written, unit: &Unit) -> Result<f64, QuantityError> {
    let si = match unit.scale {
        Scale::PowerOfTen(power) => written.times_ten_to(power),
        Scale::Ratio(numerator, denominator) => written.times_ratio(numerator, denominator),
        Scale::Turn(parts) => written.times_ten_to(0) * (2.0 * std::f64::consts::PI) / parts,
        Scale::Shifted { zero_hundredths, numerator, denominator } => {
            (written.times_ten_to(2) + zero_hundredths) * numerator / (100.0 * denominator)
        }
    };
    let si = finite(kind, text, si)?;
    if kind == Kind::Temperature && si < 0.0 {
        return Err(QuantityError::BelowAbsoluteZero { given: shown(text) });
    }
    Ok(si)
}

fn finite(kind: Kind, text: &str, value: f64) -> Result<f64, QuantityError> {
    if value.is_finite() {
        Ok(value + 0.0)
    } else {
        Err(QuantityError::NotFinite { kind, given: shown(text) })
    }
}

/// A text as an error repeats it: trimmed, without control characters, not endless.
pub(super) fn shown(text: &str) -> String {
    let clean = text.trim().chars().map(|c| if c.is_control() { ' ' } else { c });
    let mut shown: String = clean.clone().take(SHOWN).collect();
    if clean.count() > SHOWN {
        shown.push('…');
    }
    shown
}
