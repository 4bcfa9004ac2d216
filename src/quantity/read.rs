//! One quantity from its text.

use std::f64::consts::TAU;

use super::error::{QuantityError, first_unit, shown};
use super::scan::{Amount, Scanned, scan};
use super::unit::{Kind, Scale, Unit, find, plain_spelling};
use crate::diagnostic::did_you_mean;

/// The SI number of a text with its unit.
///
/// A decimal number, optionally with an exponent, then optional blanks, then the unit; a length in inches or feet
/// may be a whole number and a fraction. The result is the closest representable number for units that are a
/// power of ten of the SI unit, and within two units in the last place for the others.
///
/// # Errors
/// Every text that is not such a quantity, and an SI number above 1e15, which no part can have: see [`QuantityError`].
///
/// # Example
/// ```
/// use hubgrip::quantity::{Kind, parse};
/// assert_eq!(parse(Kind::Length, "60 mm"), Ok(0.06));
/// assert_eq!(parse(Kind::Temperature, "68 degF"), Ok(293.15));
/// assert!(parse(Kind::Length, "60 MPa").is_err());
/// ```
pub fn parse(kind: Kind, text: &str) -> Result<f64, QuantityError> {
    let scanned = scan(kind, text)?;
    value(kind, &scanned, scanned.unit)
}

/// A plain number, without a unit.
///
/// # Errors
/// As [`parse`]; a unit is one of them.
pub fn parse_number(text: &str) -> Result<f64, QuantityError> {
    parse(Kind::Number, text)
}

/// Greatest SI number that is read, of any kind: a thousand times the stiffest modulus in pascals, and far below where
/// a product of a few such numbers overflows (common practice, no source).
pub(crate) const GREATEST: f64 = 1e15;

/// The SI number of a text taken apart, with the unit it is given in.
pub(super) fn value(kind: Kind, scanned: &Scanned<'_>, unit: &str) -> Result<f64, QuantityError> {
    let given = || shown(scanned.text);
    let si = if kind == Kind::Number {
        if !unit.is_empty() {
            return Err(QuantityError::UnitNotDue { given: given() });
        }
        decimal(kind, scanned, Scale::PowerOfTen(0))?
    } else {
        in_unit(scanned, unit_of(kind, scanned.text, unit)?)?
    };
    if si.abs() > GREATEST {
        return Err(QuantityError::TooGreat { given: given() });
    }
    if kind == Kind::Temperature && si < 0.0 {
        return Err(QuantityError::BelowAbsoluteZero { given: given() });
    }
    Ok(if si == 0.0 { 0.0 } else { si })
}

fn unit_of(kind: Kind, text: &str, spelling: &str) -> Result<&'static Unit, QuantityError> {
    if spelling.is_empty() {
        return Err(QuantityError::NoUnit { kind, given: shown(text), unit: first_unit(kind) });
    }
    let plain = plain_spelling(spelling);
    if let Some(unit) = find(kind, &plain) {
        return Ok(unit);
    }
    if let Some(found) = Kind::ALL.into_iter().find(|other| find(*other, &plain).is_some()) {
        return Err(QuantityError::WrongKind { kind, given: shown(text), found });
    }
    let near = did_you_mean(&plain, kind.units().flat_map(|unit| unit.spellings()));
    Err(QuantityError::UnknownUnit { kind, unit: shown(spelling), near })
}

fn in_unit(scanned: &Scanned<'_>, unit: &Unit) -> Result<f64, QuantityError> {
    match (scanned.amount, unit.scale) {
        (Amount::Decimal { .. }, scale) => decimal(unit.kind, scanned, scale),
        (Amount::Fraction { negative, whole, numerator, denominator }, Scale::Ratio(up, down))
            if matches!(unit.name, "in" | "ft") =>
        {
            let (whole, numerator, denominator) =
                (f64::from(whole), f64::from(numerator), f64::from(denominator));
            let size = (whole * denominator + numerator) * up / (denominator * down);
            Ok(if negative { -size } else { size })
        }
        _ => Err(QuantityError::Fraction { given: shown(scanned.text) }),
    }
}

fn decimal(kind: Kind, scanned: &Scanned<'_>, scale: Scale) -> Result<f64, QuantityError> {
    let Amount::Decimal { negative, digits, exponent } = scanned.amount else {
        return Err(QuantityError::Fraction { given: shown(scanned.text) });
    };
    let shift = match scale {
        Scale::PowerOfTen(shift) => i64::from(shift),
        Scale::Shifted { .. } => 2,
        Scale::Ratio(..) | Scale::Turn(_) => 0,
    };
    let number: f64 = format!("{digits}e{}", exponent + shift).parse().unwrap_or(f64::NAN);
    let number = if negative { -number } else { number };
    let si = match scale {
        Scale::PowerOfTen(_) => number,
        Scale::Ratio(numerator, denominator) => number * numerator / denominator,
        Scale::Turn(parts) => number * TAU / parts,
        Scale::Shifted { zero_hundredths, numerator, denominator } => {
            (number + zero_hundredths) * numerator / (100.0 * denominator)
        }
    };
    if !si.is_finite() {
        return Err(QuantityError::NotFinite { kind, given: shown(scanned.text) });
    }
    let is_zero = !digits.contains(|c: char| ('1'..='9').contains(&c));
    let vanished = number == 0.0 || si == 0.0 && !matches!(scale, Scale::Shifted { .. });
    if vanished && !is_zero {
        return Err(QuantityError::TooSmall { given: shown(scanned.text) });
    }
    Ok(si)
}
