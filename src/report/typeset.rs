//! Numbers and units as they are set in the report: true minus, thin spaces, powers of ten.

/// True minus sign.
pub(crate) const MINUS: char = '\u{2212}';

/// Thin space that does not break, between number and unit and between groups of three digits.
pub(crate) const THIN: char = '\u{202F}';

/// A number as typeset: true minus, groups of three from five digits on, `1.2e-5` as 1.2·10⁻⁵.
///
/// Groups of three and the thin space follow ISO 80000-1:2022, clause 7.
pub(crate) fn number(plain: &str) -> String {
    let (mantissa, exponent) = split_exponent(plain);
    let mut text = grouped(mantissa);
    if let Some(exponent) = exponent {
        text.push_str("\u{00B7}10");
        text.extend(exponent.chars().map(superscript));
    }
    text
}

/// A unit as typeset: `um` as µm, `N.m` as N·m, `degC` as °C, `mm2` as mm².
pub(crate) fn unit(plain: &str) -> String {
    let mut text = plain.replace("deg", "°").replace('.', "\u{00B7}");
    for (name, typeset) in [("um", "µm"), ("uin", "µin")] {
        if text == name {
            text = typeset.to_owned();
        }
    }
    let mut set = String::new();
    let mut letter_before = false;
    for c in text.chars() {
        set.push(if letter_before && c.is_ascii_digit() { superscript(c) } else { c });
        letter_before = c.is_alphabetic();
    }
    set
}

/// Running text with a true minus before every negative number, begun with a capital and ended with a stop.
pub(crate) fn sentence(text: &str) -> String {
    let text = prose(text.trim());
    let mut letters = text.chars();
    let Some(first) = letters.next() else { return String::new() };
    let stop = if text.ends_with(['.', '!', '?']) { "" } else { "." };
    format!("{}{}{stop}", first.to_uppercase(), letters.as_str())
}

/// The text with its first letter in upper case.
pub(crate) fn capital(text: &str) -> String {
    let mut letters = text.chars();
    letters.next().map_or_else(String::new, |first| first.to_uppercase().chain(letters).collect())
}

/// Running text with a true minus before every negative number and a thin space before every unit.
pub(crate) fn prose(text: &str) -> String {
    let letters: Vec<char> = text.chars().collect();
    let is_minus = |place: usize| {
        letters[place] == '-'
            && letters.get(place + 1).is_some_and(char::is_ascii_digit)
            && (place == 0 || matches!(letters[place - 1], ' ' | '('))
    };
    let is_before_unit = |place: usize| {
        let word: String = letters[place + 1..].iter().take_while(|c| !c.is_whitespace()).collect();
        letters[place] == ' '
            && place > 0
            && letters[place - 1].is_ascii_digit()
            && UNITS.contains(&word.trim_end_matches([',', ';', '.', ')', ':']))
    };
    (0..letters.len())
        .map(|place| match letters[place] {
            _ if is_minus(place) => MINUS,
            _ if is_before_unit(place) => THIN,
            letter => letter,
        })
        .collect()
}

/// Units that cannot be taken for a word.
const UNITS: [&str; 20] = [
    "%", "°C", "°F", "K", "mm", "µm", "thou", "µin", "N", "kN", "lbf", "N·m", "lbf·ft", "MPa", "GPa", "ksi",
    "psi", "rpm", "kg", "J",
];

/// Mantissa and exponent of a plain number; the exponent without a plus sign and leading zeros.
pub(crate) fn split_exponent(plain: &str) -> (&str, Option<String>) {
    match plain.split_once(['e', 'E']) {
        Some((mantissa, exponent)) if is_number(mantissa) => {
            let (sign, digits) = match exponent.strip_prefix('-') {
                Some(digits) => ("-", digits),
                None => ("", exponent.strip_prefix('+').unwrap_or(exponent)),
            };
            let digits = digits.trim_start_matches('0');
            let digits = if digits.is_empty() { "0" } else { digits };
            (mantissa, Some(format!("{sign}{digits}")))
        }
        _ => (plain, None),
    }
}

/// Whether the text is a number without exponent.
pub(crate) fn is_number(text: &str) -> bool {
    let digits = text.strip_prefix(['-', '+', MINUS]).unwrap_or(text);
    digits.starts_with(|c: char| c.is_ascii_digit() || c == '.')
        && digits.chars().all(|c| c.is_ascii_digit() || c == '.')
}

/// The number cut at its decimal point, so that a column can be aligned there: `−12` and `.5`.
pub(crate) fn at_point(typeset: &str) -> (&str, &str) {
    match typeset.find('.') {
        Some(place) => typeset.split_at(place),
        None => (typeset, ""),
    }
}

fn grouped(mantissa: &str) -> String {
    if !is_number(mantissa) {
        return mantissa.replace('-', &MINUS.to_string());
    }
    let unsigned = mantissa.trim_start_matches(['-', '+', MINUS]);
    let (whole, fraction) = unsigned.split_once('.').unwrap_or((unsigned, ""));
    let mut text = String::new();
    if mantissa.starts_with(['-', MINUS]) {
        text.push(MINUS);
    } else if mantissa.starts_with('+') {
        text.push('+');
    }
    for (index, digit) in whole.chars().enumerate() {
        let left = whole.len() - index;
        if whole.len() >= 5 && index > 0 && left % 3 == 0 {
            text.push(THIN);
        }
        text.push(digit);
    }
    if !fraction.is_empty() {
        text.push('.');
        text.push_str(fraction);
    }
    text
}

fn superscript(c: char) -> char {
    match c {
        '0' => '⁰',
        '1' => '¹',
        '2' => '²',
        '3' => '³',
        '4' => '⁴',
        '5' => '⁵',
        '6' => '⁶',
        '7' => '⁷',
        '8' => '⁸',
        '9' => '⁹',
        _ => '⁻',
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn sets_a_true_minus_and_groups_of_three() {
        assert_eq!(number("-12.50"), "−12.50");
        assert_eq!(number("1234"), "1234");
        assert_eq!(number("12345.6"), "12\u{202F}345.6");
        assert_eq!(number("1234567"), "1\u{202F}234\u{202F}567");
        assert_eq!(number("+53"), "+53");
    }

    #[test]
    fn sets_an_exponent_as_a_power_of_ten() {
        assert_eq!(number("1.2e-5"), "1.2·10⁻⁵");
        assert_eq!(number("2.1e+05"), "2.1·10⁵");
        assert_eq!(number("-3e6"), "−3·10⁶");
    }

    #[test]
    fn sets_units_and_sentences() {
        let units = ["um", "N.m", "degC", "mm2", "kg/m3", "10^-6"].map(unit);
        assert_eq!(units, ["µm", "N·m", "°C", "mm²", "kg/m³", "10^-6"]);
        assert_eq!(sentence("cold to -78.5 °C"), "Cold to −78.5\u{202F}°C.");
        assert_eq!(prose("EN-GJL-250 and 2-3 at (-5)"), "EN-GJL-250 and 2-3 at (−5)");
        assert_eq!(prose("at -5 °C, 3 to 4 N."), "at −5\u{202F}°C, 3 to 4\u{202F}N.");
        assert_eq!(prose("2 in the bath, 3 Names"), "2 in the bath, 3 Names");
    }

    #[test]
    fn leaves_words_alone() {
        assert_eq!(number("none"), "none");
    }

    #[test]
    fn cuts_at_the_decimal_point() {
        assert_eq!(at_point("−12.5"), ("−12", ".5"));
        assert_eq!(at_point("7"), ("7", ""));
    }
}
