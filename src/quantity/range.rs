//! Two quantities in one text: ranges, deviations, a value with its uncertainty.

use super::error::QuantityError;
use super::read::{parse, shown, split};
use super::unit::Kind;

/// A range such as `0.008 mm to 14 um` or `8 to 14 um`, or one value for both ends; (low, high) in SI.
///
/// # Errors
/// A part that is not a quantity of the kind, or a range that runs downwards.
///
/// # Example
/// ```
/// use hubgrip::quantity::{Kind, parse_range};
/// assert_eq!(parse_range(Kind::Length, "8 to 14 um"), Ok((8e-6, 14e-6)));
/// assert_eq!(parse_range(Kind::Length, "8 um"), Ok((8e-6, 8e-6)));
/// ```
pub fn parse_range(kind: Kind, text: &str) -> Result<(f64, f64), QuantityError> {
    let Some((low, high)) = text.split_once(" to ") else {
        let value = parse(kind, text)?;
        return Ok((value, value));
    };
    let greatest = parse(kind, high)?;
    let (_, _, own_unit) = split(kind, low)?;
    let least = if own_unit.is_empty() && kind != Kind::Number {
        let (_, _, unit) = split(kind, high)?;
        parse(kind, &format!("{} {unit}", low.trim()))?
    } else {
        parse(kind, low)?
    };
    if least > greatest {
        return Err(QuantityError::RangeOrder { given: shown(text) });
    }
    Ok((least, greatest))
}

/// A range of pure numbers such as `0.08 to 0.14`, or one number for both ends.
///
/// # Errors
/// As [`parse_range`].
pub fn parse_number_range(text: &str) -> Result<(f64, f64), QuantityError> {
    parse_range(Kind::Number, text)
}

/// Deviations such as `±10 um`, `+/- 10 um` or `+30 / -10 um`; (lower, upper) in SI.
///
/// # Errors
/// A text of another form, or parts that are not quantities of the kind.
///
/// # Example
/// ```
/// use hubgrip::quantity::{Kind, parse_plus_minus};
/// assert_eq!(parse_plus_minus(Kind::Length, "±10 um"), Ok((-10e-6, 10e-6)));
/// assert_eq!(parse_plus_minus(Kind::Length, "+30 / -10 um"), Ok((-10e-6, 30e-6)));
/// ```
pub fn parse_plus_minus(kind: Kind, text: &str) -> Result<(f64, f64), QuantityError> {
    let trimmed = text.trim();
    for sign in ["±", "+/-", "+-"] {
        if let Some(width) = trimmed.strip_prefix(sign) {
            let width = parse(kind, width)?;
            return if width < 0.0 {
                Err(QuantityError::NotPlusMinus { given: shown(text) })
            } else {
                Ok((-width, width))
            };
        }
    }
    let parts = trimmed.strip_prefix('+').and_then(|rest| rest.split_once('/'));
    let Some((upper, lower)) = parts.map(|(upper, lower)| (upper.trim(), lower.trim())) else {
        return Err(QuantityError::NotPlusMinus { given: shown(text) });
    };
    if !lower.starts_with('-') {
        return Err(QuantityError::NotPlusMinus { given: shown(text) });
    }
    let (_, _, unit) = split(kind, lower)?;
    let (_, _, own_unit) = split(kind, upper)?;
    let upper =
        if own_unit.is_empty() { parse(kind, &format!("{upper} {unit}"))? } else { parse(kind, upper)? };
    Ok((parse(kind, lower)?, upper))
}

/// A value with its uncertainty such as `60.012 mm ± 2 um`; (value, uncertainty) in SI, zero when none is given.
///
/// # Errors
/// Parts that are not quantities of the kind, or an uncertainty below zero.
///
/// # Example
/// ```
/// use hubgrip::quantity::{Kind, parse_with_uncertainty};
/// assert_eq!(parse_with_uncertainty(Kind::Length, "60.012 mm ± 2 um"), Ok((0.060012, 2e-6)));
/// ```
pub fn parse_with_uncertainty(kind: Kind, text: &str) -> Result<(f64, f64), QuantityError> {
    let Some((value, width)) = ["±", "+/-", "+-"].iter().find_map(|sign| text.split_once(sign)) else {
        return Ok((parse(kind, text)?, 0.0));
    };
    let (_, _, own_unit) = split(kind, value)?;
    let (_, _, unit) = split(kind, width)?;
    let value = if own_unit.is_empty() {
        parse(kind, &format!("{} {unit}", value.trim()))?
    } else {
        parse(kind, value)?
    };
    let difference = if kind == Kind::Temperature { Kind::TemperatureDifference } else { kind };
    let width = parse(difference, width)?;
    if width < 0.0 {
        return Err(QuantityError::NotPlusMinus { given: shown(text) });
    }
    Ok((value, width))
}
