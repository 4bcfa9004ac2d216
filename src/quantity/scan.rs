//! The number at the start of a text, digit by digit.

/// A number as written, before its unit is known.
#[derive(Debug, Clone, PartialEq)]
pub(super) enum Written {
    /// Sign, digits with an optional point, and power of ten.
    Decimal {
        /// Mantissa as text that Rust reads, such as `-1.5`.
        mantissa: String,
        /// Power of ten.
        exponent: i32,
    },
    /// Whole part and fraction, such as 2-3/16.
    Fraction {
        /// The value times the denominator.
        numerator: f64,
        /// The denominator, not zero.
        denominator: f64,
    },
}

impl Written {
    /// The number times a power of ten; exact for decimals as far as a double goes.
    pub(super) fn times_ten_to(&self, power: i32) -> f64 {
        match self {
            Self::Decimal { mantissa, exponent } => {
                format!("{mantissa}e{}", exponent.saturating_add(power)).parse().unwrap_or(f64::NAN)
            }
            Self::Fraction { numerator, denominator } if power >= 0 => {
                numerator * 10f64.powi(power) / denominator
            }
            Self::Fraction { numerator, denominator } => numerator / (denominator * 10f64.powi(-power)),
        }
    }

    /// The number times one number and divided by another, rounded once where it can be.
    pub(super) fn times_ratio(&self, numerator: f64, denominator: f64) -> f64 {
        match self {
            Self::Decimal { .. } => self.times_ten_to(0) * numerator / denominator,
            Self::Fraction { numerator: top, denominator: bottom } => {
                top * numerator / (bottom * denominator)
            }
        }
    }
}

/// A number and what stands behind it, or why there is none.
#[derive(Debug, Clone, PartialEq)]
pub(super) enum Scan<'a> {
    /// The number, its text, and the rest with blanks trimmed.
    Found(Written, &'a str, &'a str),
    /// Digits with a comma, blank or underscore among them: the whole text so far, and with a decimal point.
    Grouped(String, Option<String>),
    /// NaN or infinity.
    NotFinite,
    /// No number.
    Missing,
}

/// Reads the number at the start of a text.
pub(super) fn number(text: &str) -> Scan<'_> {
    let text = text.trim();
    let lower = text.trim_start_matches(['+', '-', '.']).to_ascii_lowercase();
    if ["nan", "inf"].iter().any(|word| lower.starts_with(word)) {
        return Scan::NotFinite;
    }
    let unsigned = text.strip_prefix(['+', '-']).unwrap_or(text);
    let sign_length = text.len() - unsigned.len();
    let digits = decimal_length(unsigned);
    if digits == 0 {
        return Scan::Missing;
    }
    let negative = text.starts_with('-');
    if let Some((length, written)) = fraction(unsigned, negative) {
        let end = sign_length + length;
        return Scan::Found(written, &text[..end], text[end..].trim_start());
    }
    let rest = &unsigned[digits..];
    if let Some(scan) = grouped(text, sign_length + digits, rest) {
        return scan;
    }
    let (exponent_length, exponent) = exponent(rest);
    let end = sign_length + digits + exponent_length;
    let sign = if negative { "-" } else { "" };
    let mantissa = format!("{sign}{}", &unsigned[..digits]);
    Scan::Found(Written::Decimal { mantissa, exponent }, &text[..end], text[end..].trim_start())
}

/// Length of digits with at most one point; zero when there is no digit.
fn decimal_length(text: &str) -> usize {
    let mut point = false;
    let mut has_digit = false;
    let mut length = 0;
    for (index, character) in text.char_indices() {
        match character {
            '0'..='9' => has_digit = true,
            '.' if !point && text[index + 1..].starts_with(|next: char| next.is_ascii_digit()) => {
                point = true
            }
            '.' if !point && has_digit => {
                // A point at the end, as in `60. mm`, belongs to the number unless a letter follows it.
                let follows = text[index + 1..].chars().next();
                if follows.is_some_and(|next| !next.is_whitespace()) {
                    break;
                }
                point = true;
            }
            _ => break,
        }
        length = index + 1;
    }
    if has_digit { length } else { 0 }
}

/// A comma, underscore or hexadecimal mark behind the digits.
fn grouped<'a>(text: &'a str, end: usize, rest: &'a str) -> Option<Scan<'a>> {
    let mut following = rest.chars();
    let mark = following.next()?;
    let after = following.next();
    let digit_after = after.is_some_and(|next| next.is_ascii_digit());
    let mantissa = &text[..end];
    match mark {
        ',' if digit_after => {
            let meant = (!mantissa.contains('.')).then(|| text.replacen(',', ".", 1));
            Some(Scan::Grouped(text.to_owned(), meant))
        }
        '_' | '\'' if digit_after => Some(Scan::Grouped(text.to_owned(), None)),
        'x' | 'X' if mantissa.trim_start_matches(['+', '-']) == "0" => {
            Some(Scan::Grouped(text.to_owned(), None))
        }
        '.' if digit_after => Some(Scan::Grouped(text.to_owned(), None)),
        ' ' if digit_after => Some(Scan::Grouped(text.to_owned(), None)),
        _ => None,
    }
}

/// Length and value of an exponent such as `e-3`; an `e` without digits is no exponent.
fn exponent(rest: &str) -> (usize, i32) {
    let Some(tail) = rest.strip_prefix(['e', 'E']) else { return (0, 0) };
    let unsigned = tail.strip_prefix(['+', '-']).unwrap_or(tail);
    let digits = unsigned.bytes().take_while(u8::is_ascii_digit).count();
    if digits == 0 {
        return (0, 0);
    }
    let sign_length = tail.len() - unsigned.len();
    let text = &tail[..sign_length + digits];
    let value = text.parse().unwrap_or(if text.starts_with('-') { i32::MIN / 2 } else { i32::MAX / 2 });
    (1 + sign_length + digits, value)
}

/// `3/8`, `2-3/16` or `2 3/16`: length and value.
fn fraction(text: &str, negative: bool) -> Option<(usize, Written)> {
    let whole_digits = digits(text);
    let (whole, start) = match text[whole_digits..].chars().next()? {
        '/' => (0.0, 0),
        '-' | ' ' => {
            let gap = text[whole_digits + 1..].len() - text[whole_digits + 1..].trim_start().len();
            (text[..whole_digits].parse().ok()?, whole_digits + 1 + gap)
        }
        _ => return None,
    };
    let top_digits = digits(&text[start..]);
    let after_top = start + top_digits;
    let bottom_text = text.get(after_top..)?.strip_prefix('/')?;
    let bottom_digits = digits(bottom_text);
    if top_digits == 0 || bottom_digits == 0 {
        return None;
    }
    let top: f64 = text[start..after_top].parse().ok()?;
    let bottom: f64 = bottom_text[..bottom_digits].parse().ok()?;
    if bottom == 0.0 {
        return None;
    }
    let sign = if negative { -1.0 } else { 1.0 };
    let written = Written::Fraction { numerator: sign * (whole * bottom + top), denominator: bottom };
    Some((after_top + 1 + bottom_digits, written))
}

fn digits(text: &str) -> usize {
    text.bytes().take_while(u8::is_ascii_digit).count()
}
