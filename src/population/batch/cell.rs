//! What a cell says, with the unit from the head of its column.

use std::borrow::Cow;
use std::io::Write;

use super::header::Column;
use crate::quantity::unit::{Scale, Unit};
use crate::quantity::{GREATEST, Kind, parse};

/// The text of a cell as it would be written in a joint file.
pub(super) fn written<'a>(cell: &'a str, column: &Column) -> Cow<'a, str> {
    let bare = !cell.is_empty()
        && cell.chars().all(|c| c.is_ascii_digit() || matches!(c, '+' | '-' | '.' | '/' | ' ' | 'e' | 'E'));
    if !bare || (column.unit.is_empty() && column.before.is_empty()) {
        return Cow::Borrowed(cell);
    }
    let gap = if column.unit.is_empty() { "" } else { " " };
    Cow::Owned(format!("{}{cell}{gap}{}", column.before, column.unit))
}

/// The unit of a column for plain decimal numbers of a kind; none when only the reader of quantities knows it.
pub(super) fn unit_of(kind: Kind, column: &Column) -> Option<&'static Unit> {
    if !column.before.is_empty() {
        return None;
    }
    let plain = column.unit.replace(['µ', 'μ'], "u").replace('°', "deg").replace('·', ".");
    kind.units().find(|unit| unit.spellings().any(|spelling| spelling == plain))
}

/// The SI number of a cell; none when it has none, which is for the reader of joint files to tell.
pub(super) fn quantity(kind: Kind, cell: &str, column: &Column, unit: Option<&'static Unit>) -> Option<f64> {
    let fast = match (kind, unit) {
        (Kind::Number, None) if column.unit.is_empty() => decimal(cell, 0),
        (_, Some(Unit { scale: Scale::PowerOfTen(power), .. })) => decimal(cell, *power),
        (_, Some(Unit { scale: Scale::Shifted { zero_hundredths, numerator, denominator }, .. })) => {
            decimal(cell, 2)
                .map(|hundredths| (hundredths + zero_hundredths) * numerator / (100.0 * denominator))
        }
        _ => None,
    };
    match fast {
        Some(value) if value.abs() > GREATEST || (kind == Kind::Temperature && value < 0.0) => None,
        Some(value) => Some(value),
        None => parse(kind, &written(cell, column)).ok(),
    }
}

/// Longest plain decimal number that is read here; longer ones are left to the reader of quantities.
const LONGEST: usize = 32;

/// A plain decimal number times a power of ten, rounded once, as the reader of quantities does it.
fn decimal(cell: &str, power: i32) -> Option<f64> {
    let unsigned = cell.strip_prefix(['+', '-']).unwrap_or(cell);
    let mut parts = unsigned.splitn(2, '.');
    let digits = |part: &str| !part.is_empty() && part.bytes().all(|byte| byte.is_ascii_digit());
    let whole = parts.next().is_some_and(digits);
    if !whole || !parts.next().is_none_or(digits) || cell.len() > LONGEST {
        return None;
    }
    let plain = cell.strip_prefix('+').unwrap_or(cell);
    if power == 0 {
        return plain.parse::<f64>().ok().map(|value| value + 0.0);
    }
    let mut text = [0_u8; LONGEST + 8];
    let mut rest = &mut text[..];
    write!(rest, "{plain}e{power}").ok()?;
    let left = rest.len();
    let length = text.len() - left;
    let text = std::str::from_utf8(text.get(..length)?).ok()?;
    text.parse::<f64>().ok().map(|value| value + 0.0)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn column(unit: &str) -> Column {
        Column { head: String::new(), key: None, before: String::new(), unit: unit.to_owned() }
    }

    #[test]
    fn the_short_way_gives_the_bits_of_the_reader() {
        let kinds = [
            (Kind::Length, "mm"),
            (Kind::Length, "um"),
            (Kind::Length, "in"),
            (Kind::Torque, "N.m"),
            (Kind::Torque, "kN.m"),
            (Kind::Temperature, "degC"),
            (Kind::Temperature, "degF"),
            (Kind::Pressure, "MPa"),
            (Kind::Force, "kN"),
        ];
        for (kind, unit) in kinds {
            let column = column(unit);
            let known = unit_of(kind, &column);
            assert!(known.is_some(), "{unit}");
            for cell in [
                "0",
                "60",
                "60.012",
                "0.1",
                "-3.5",
                "+7",
                "123456.789012345678",
                "1e3",
                "7 1/2",
                "60 mm",
                "x",
                "",
            ] {
                let short = quantity(kind, cell, &column, known);
                let reader = parse(kind, &written(cell, &column)).ok();
                assert_eq!(short.map(f64::to_bits), reader.map(f64::to_bits), "{cell} {unit}");
            }
        }
        assert_eq!(quantity(Kind::Number, "0.12", &column(""), None), Some(0.12));
    }

    #[test]
    fn a_plain_number_takes_the_unit_of_its_column() {
        assert_eq!(written("60", &column("mm")), "60 mm");
        assert_eq!(written("2 1/2", &column("in")), "2 1/2 in");
        assert_eq!(written("60 um", &column("mm")), "60 um");
        assert_eq!(written("H7/s6", &column("")), "H7/s6");
        let roughness = Column { before: "Rz ".to_owned(), ..column("um") };
        assert_eq!(written("6.3", &roughness), "Rz 6.3 um");
        assert_eq!(written("Ra 0.8 um", &roughness), "Ra 0.8 um");
    }
}
