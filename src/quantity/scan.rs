//! A text taken apart into its number and its unit.

use super::error::{QuantityError, shown};
use super::unit::Kind;

/// The number of a quantity as written.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) enum Amount<'a> {
    /// Digits with at most one point, times a power of ten.
    Decimal { negative: bool, digits: &'a str, exponent: i64 },
    /// Whole and numerator over denominator.
    Fraction { negative: bool, whole: u32, numerator: u32, denominator: u32 },
}

/// A number and the unit that follows it, which may be empty.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Scanned<'a> {
    /// The whole text, without blanks around it.
    pub text: &'a str,
    /// The number.
    pub amount: Amount<'a>,
    /// The unit as written, without blanks around it.
    pub unit: &'a str,
}

/// Takes a text apart; `due` is for the error.
pub(super) fn scan(due: Kind, text: &str) -> Result<Scanned<'_>, QuantityError> {
    let text = text.trim();
    if text.is_empty() {
        return Err(QuantityError::Empty { kind: due });
    }
    let (negative, unsigned) = sign(text);
    let (digits, rest) = split_digits(unsigned);
    if !digits.contains(|c: char| c.is_ascii_digit()) {
        return Err(no_number(due, text));
    }
    if let Some((amount, rest)) = fraction(text, negative, digits, rest)? {
        check_end(text, rest)?;
        return Ok(Scanned { text, amount, unit: rest.trim() });
    }
    let (exponent, rest) = split_exponent(rest);
    check_end(text, rest)?;
    Ok(Scanned { text, amount: Amount::Decimal { negative, digits, exponent }, unit: rest.trim() })
}

/// Whether a minus sign leads, and what follows the sign.
fn sign(text: &str) -> (bool, &str) {
    if let Some(rest) = text.strip_prefix(['-', '−']) {
        return (true, rest.trim_start());
    }
    (false, text.strip_prefix('+').map_or(text, str::trim_start))
}

/// The leading digits with at most one point, and the rest.
fn split_digits(text: &str) -> (&str, &str) {
    let whole = count_digits(text);
    let end = match text[whole..].strip_prefix('.') {
        Some(decimals) => whole + 1 + count_digits(decimals),
        None => whole,
    };
    text.split_at(end)
}

/// How many ASCII digits lead, which is also their length in bytes.
fn count_digits(text: &str) -> usize {
    text.bytes().take_while(u8::is_ascii_digit).count()
}

/// Why a text without leading digits is no number.
fn no_number(kind: Kind, text: &str) -> QuantityError {
    let word = text.trim_start_matches(['+', '-', '−', '.']).to_ascii_lowercase();
    match word.starts_with("nan") || word.starts_with("inf") {
        true => QuantityError::NotFinite { kind, given: shown(text) },
        false => QuantityError::NoNumber { kind, given: shown(text) },
    }
}

fn not_plain(text: &str, meant: Option<String>) -> QuantityError {
    QuantityError::NotPlainDecimal { given: shown(text), meant: meant.map(|meant| shown(&meant)) }
}

/// The power of ten after `e`, zero when there is none, and the rest.
fn split_exponent(rest: &str) -> (i64, &str) {
    let Some(after) = rest.strip_prefix(['e', 'E']) else { return (0, rest) };
    let (negative, unsigned) = match after.strip_prefix(['-', '−']) {
        Some(unsigned) => (true, unsigned),
        None => (false, after.strip_prefix('+').unwrap_or(after)),
    };
    let (digits, rest_after) = unsigned.split_at(count_digits(unsigned));
    if digits.is_empty() {
        return (0, rest);
    }
    // An exponent of more than eighteen digits is out of range all the same.
    let size = digits.parse().unwrap_or(1_000_000_000_000_000_000_i64);
    (if negative { -size } else { size }, rest_after)
}

/// A fraction after the whole number `digits`, or starting with it, and the rest; none when there is none.
fn fraction<'a>(
    text: &str,
    negative: bool,
    digits: &str,
    rest: &'a str,
) -> Result<Option<(Amount<'a>, &'a str)>, QuantityError> {
    let fault = || QuantityError::Fraction { given: shown(text) };
    let number = |digits: &str| digits.parse::<u32>().map_err(|_| fault());
    let (whole, numerator, denominator, rest) = if let Some((denominator, rest)) = denominator(rest) {
        ("0", digits, denominator, rest)
    } else {
        let after = rest.strip_prefix('-').unwrap_or(rest.trim_start());
        let (numerator, after) = after.split_at(count_digits(after));
        match denominator(after) {
            Some((denominator, rest)) if !numerator.is_empty() => (digits, numerator, denominator, rest),
            _ => return Ok(None),
        }
    };
    let amount = Amount::Fraction {
        negative,
        whole: number(whole)?,
        numerator: number(numerator)?,
        denominator: number(denominator)?,
    };
    match amount {
        Amount::Fraction { numerator, denominator, .. } if numerator >= denominator => Err(fault()),
        _ => Ok(Some((amount, rest))),
    }
}

/// The digits after a stroke and the rest; none when no digit follows.
fn denominator(rest: &str) -> Option<(&str, &str)> {
    let after = rest.strip_prefix('/')?;
    let (digits, rest) = after.split_at(count_digits(after));
    (!digits.is_empty()).then_some((digits, rest))
}

/// Refuses what looks like more of the number after its end.
fn check_end(text: &str, rest: &str) -> Result<(), QuantityError> {
    let unit = rest.trim_start();
    if rest.starts_with(',') {
        return Err(not_plain(text, Some(without_comma(text))));
    }
    let digits = count_digits(unit);
    let goes_on = digits > 0 && !unit.starts_with("1/");
    let hexadecimal =
        text.trim_start_matches(['+', '-', '−']).starts_with(['0']) && rest.starts_with(['x', 'X']);
    if goes_on || hexadecimal || rest.starts_with(['.', '_', '\'', '’', '+', '-', '−']) {
        return Err(not_plain(text, None));
    }
    Ok(())
}

/// The text with its commas taken out, or the only one made a point when there is no other.
///
/// One comma before exactly three digits may be either, so both are offered.
fn without_comma(text: &str) -> String {
    if text.contains('.') || text.matches(',').count() > 1 {
        return text.replace(',', "");
    }
    let decimal = text.replace(',', ".");
    match text.split_once(',') {
        Some((_, after)) if count_digits(after) == 3 => format!("{decimal} or {}", text.replace(',', "")),
        _ => decimal,
    }
}
