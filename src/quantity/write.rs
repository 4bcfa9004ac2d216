//! SI number to text that reads back to it.

use super::read::parse;
use super::unit::{Kind, Unit};

/// Text of a quantity that [`parse`] reads back, in the unit that fits its size.
///
/// The text reads back to the same number wherever a decimal number in that unit gives it, which is so for
/// every number that came from a text in that unit; otherwise it differs by the last bit at most.
///
/// # Example
/// ```
/// use hubgrip::quantity::{Kind, parse, written};
/// assert_eq!(written(Kind::Length, 0.06), "60 mm");
/// assert_eq!(written(Kind::Temperature, 293.15), "20 degC");
/// assert_eq!(parse(Kind::Pressure, &written(Kind::Pressure, 355e6)), Ok(355e6));
/// ```
pub fn written(kind: Kind, si: f64) -> String {
    let Some(unit) = unit_for(kind, si) else { return plain(si) };
    let exact = unit.from_si(si);
    let rounded: Option<f64> = format!("{exact:.14e}").parse().ok();
    let text = |number: f64| format!("{} {}", plain(number), unit.name);
    if let Some(rounded) = rounded
        && parse(kind, &text(rounded)) == Ok(si)
    {
        return text(rounded);
    }
    text(exact)
}

/// The unit to write in: the one of its kind that is usual for the size.
fn unit_for(kind: Kind, si: f64) -> Option<&'static Unit> {
    let size = si.abs();
    let name = match kind {
        Kind::Number => return None,
        Kind::Length if size != 0.0 && size < 1e-3 => "um",
        Kind::Length => "mm",
        Kind::Force if size >= 1e4 => "kN",
        Kind::Force => "N",
        Kind::Pressure if size >= 1e10 => "GPa",
        Kind::Pressure => "MPa",
        Kind::Temperature => "degC",
        Kind::Angle => "deg",
        Kind::Time if size >= 3600.0 => "h",
        Kind::Time => "s",
        Kind::Expansion => "/K",
        _ => kind.units().next()?.name,
    };
    kind.units().find(|unit| unit.name == name)
}

/// The shortest text of a number that reads back, with an exponent when it is far from one.
fn plain(number: f64) -> String {
    let number = number + 0.0;
    let size = number.abs();
    if size != 0.0 && !(1e-5..1e15).contains(&size) { format!("{number:e}") } else { number.to_string() }
}
