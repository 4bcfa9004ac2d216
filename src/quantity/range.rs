//! Ranges and deviations: two numbers from one text.

use super::error::{QuantityError, shown};
use super::read::{parse, value};
use super::scan::scan;
use super::unit::Kind;

/// Both ends of a range, SI: `0.08 mm to 0.14 mm`, `8 to 14 um`, or one value for both ends.
///
/// One unit at the end serves both.
///
/// # Errors
/// As [`parse`] for each end, and when the greater end comes first.
///
/// # Example
/// ```
/// use hubgrip::quantity::{Kind, parse_range};
/// assert_eq!(parse_range(Kind::Length, "8 to 14 um"), Ok((8e-6, 14e-6)));
/// assert_eq!(parse_range(Kind::Length, "8 um"), Ok((8e-6, 8e-6)));
/// ```
pub fn parse_range(kind: Kind, text: &str) -> Result<(f64, f64), QuantityError> {
    let Some((low, high)) = split_at_to(text) else {
        let both = parse(kind, text)?;
        return Ok((both, both));
    };
    let (low, high) = pair(kind, low, high)?;
    if low > high {
        return Err(QuantityError::RangeOrder { given: shown(text) });
    }
    Ok((low, high))
}

/// Both ends of a range of plain numbers: `0.08 to 0.14`, or one number for both.
///
/// # Errors
/// As [`parse_range`].
pub fn parse_number_range(text: &str) -> Result<(f64, f64), QuantityError> {
    parse_range(Kind::Number, text)
}

/// Lower and upper deviation, SI: `±10 um`, `+-10 um`, `+/- 10 um`, `+30 / -10 um`.
///
/// Of two deviations each carries its sign; the unit at the end serves both, and either may come first.
///
/// # Errors
/// As [`parse`], and when the text is a single deviation one way.
///
/// # Example
/// ```
/// use hubgrip::quantity::{Kind, parse_plus_minus};
/// assert_eq!(parse_plus_minus(Kind::Length, "±10 um"), Ok((-10e-6, 10e-6)));
/// assert_eq!(parse_plus_minus(Kind::Length, "+30 / -10 um"), Ok((-10e-6, 30e-6)));
/// ```
pub fn parse_plus_minus(kind: Kind, text: &str) -> Result<(f64, f64), QuantityError> {
    let text = text.trim();
    if let Some(size) = PLUS_MINUS.iter().find_map(|sign| text.strip_prefix(sign)) {
        let size = unsigned(kind, size, text)?;
        return Ok((-size, size));
    }
    let Some((first, second)) = split_at_stroke(text) else {
        return Err(QuantityError::NotPlusMinus { given: shown(text) });
    };
    let (first, second) = pair(kind, first, second)?;
    Ok((first.min(second), first.max(second)))
}

/// A value and its uncertainty both ways, SI: `60 mm ± 5 um`, `60.012 ± 0.002 mm`.
///
/// Without ± the uncertainty is zero: none was stated. The uncertainty of a temperature is a difference.
///
/// # Errors
/// As [`parse`] for each of the two.
///
/// # Example
/// ```
/// use hubgrip::quantity::{Kind, parse_with_uncertainty};
/// assert_eq!(parse_with_uncertainty(Kind::Length, "60 mm ± 5 um"), Ok((0.06, 5e-6)));
/// ```
pub fn parse_with_uncertainty(kind: Kind, text: &str) -> Result<(f64, f64), QuantityError> {
    let text = text.trim();
    let split = PLUS_MINUS.iter().find_map(|sign| text.split_once(sign));
    let Some((value_text, size_text)) = split else { return Ok((parse(kind, text)?, 0.0)) };
    let size_kind = if kind == Kind::Temperature { Kind::TemperatureDifference } else { kind };
    let scanned = scan(kind, value_text)?;
    let size = unsigned(size_kind, size_text, text).map_err(|error| match kind {
        Kind::Length if !scanned.unit.is_empty() => error.suggesting("um"),
        _ => error,
    })?;
    let unit = if scanned.unit.is_empty() { scan(size_kind, size_text)?.unit } else { scanned.unit };
    Ok((value(kind, &scanned, unit)?, size))
}

const PLUS_MINUS: [&str; 4] = ["±", "+/-", "+/−", "+-"];

/// A size that carries no sign of its own.
fn unsigned(kind: Kind, size: &str, whole: &str) -> Result<f64, QuantityError> {
    if size.trim_start().starts_with(['+', '-', '−', '±']) {
        return Err(QuantityError::NotPlusMinus { given: shown(whole) });
    }
    parse(kind, size)
}

/// Two quantities of which the first may take the unit of the second.
fn pair(kind: Kind, first: &str, second: &str) -> Result<(f64, f64), QuantityError> {
    let (first, second) = (scan(kind, first)?, scan(kind, second)?);
    let unit = if first.unit.is_empty() { second.unit } else { first.unit };
    Ok((value(kind, &first, unit)?, value(kind, &second, second.unit)?))
}

/// What stands before and after the first word `to`.
fn split_at_to(text: &str) -> Option<(&str, &str)> {
    text.match_indices("to").find_map(|(at, word)| {
        let (before, after) = (&text[..at], &text[at + word.len()..]);
        let alone = before.ends_with(char::is_whitespace) && after.starts_with(char::is_whitespace);
        alone.then_some((before, after))
    })
}

/// Two signed deviations parted by a stroke, such as `+30 / -10 um`.
fn split_at_stroke(text: &str) -> Option<(&str, &str)> {
    let signed = |text: &str| text.trim_start().starts_with(['+', '-', '−', '0']);
    text.match_indices('/').find_map(|(at, stroke)| {
        let (first, second) = (&text[..at], &text[at + stroke.len()..]);
        let parted = signed(first) && signed(second) && !first.trim().is_empty();
        parted.then_some((first, second))
    })
}
