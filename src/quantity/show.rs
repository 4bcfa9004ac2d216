//! SI number to what a person reads, in metric or inch units, with no more digits than it deserves.

use std::fmt;

use super::UnitSystem;

/// What a shown number measures, which picks its unit and its digits.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum Measure {
    /// A size: mm to 0.1 µm, in to 0.01 thou.
    Size,
    /// A deviation, interference or clearance: µm to 0.1, thou to 0.01.
    Deviation,
    /// Pressure and stress: MPa, ksi.
    Pressure,
    /// Force: kN, lbf.
    Force,
    /// Torque: N·m, lbf·ft.
    Torque,
    /// Absolute temperature: °C, °F, to whole degrees unless more digits matter.
    Temperature,
    /// Temperature difference: K, °F.
    TemperatureDifference,
    /// Rotational speed: rpm.
    Speed,
    /// Mass: kg, lb.
    Mass,
    /// Time: s.
    Time,
    /// Work: J, ft·lbf.
    Work,
    /// Volume: litres, US gallons.
    Volume,
}

/// Unit of a measure: its name and how it stands to SI.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct DisplayUnit {
    /// Name as printed.
    pub name: &'static str,
    /// How many of it make one SI unit.
    pub per_si: f64,
    /// Added after scaling; zero but for temperatures.
    pub offset: f64,
}

impl DisplayUnit {
    /// The number in this unit.
    pub fn of(&self, si: f64) -> f64 {
        si * self.per_si + self.offset
    }
}

const INCH: f64 = 0.0254;
const POUND: f64 = 0.45359237;
const POUND_FORCE: f64 = POUND * 9.80665;

/// The unit in which a measure is shown.
pub fn display_unit(measure: Measure, system: UnitSystem) -> DisplayUnit {
    let scaled = |name, per_si| DisplayUnit { name, per_si, offset: 0.0 };
    let metric = system == UnitSystem::Metric;
    match measure {
        Measure::Size if metric => scaled("mm", 1e3),
        Measure::Size => scaled("in", 1.0 / INCH),
        Measure::Deviation if metric => scaled("µm", 1e6),
        Measure::Deviation => scaled("thou", 1e3 / INCH),
        Measure::Pressure if metric => scaled("MPa", 1e-6),
        Measure::Pressure => scaled("ksi", INCH * INCH / POUND_FORCE * 1e-3),
        Measure::Force if metric => scaled("kN", 1e-3),
        Measure::Force => scaled("lbf", 1.0 / POUND_FORCE),
        Measure::Torque if metric => scaled("N·m", 1.0),
        Measure::Torque => scaled("lbf·ft", 1.0 / (POUND_FORCE * 12.0 * INCH)),
        Measure::Temperature if metric => DisplayUnit { name: "°C", per_si: 1.0, offset: -273.15 },
        Measure::Temperature => DisplayUnit { name: "°F", per_si: 1.8, offset: -459.67 },
        Measure::TemperatureDifference if metric => scaled("K", 1.0),
        Measure::TemperatureDifference => scaled("°F", 1.8),
        Measure::Speed => scaled("rpm", 30.0 / std::f64::consts::PI),
        Measure::Mass if metric => scaled("kg", 1.0),
        Measure::Mass => scaled("lb", 1.0 / POUND),
        Measure::Time => scaled("s", 1.0),
        Measure::Work if metric => scaled("J", 1.0),
        Measure::Work => scaled("ft·lbf", 1.0 / (POUND_FORCE * 12.0 * INCH)),
        Measure::Volume if metric => scaled("l", 1e3),
        Measure::Volume => scaled("US gal", 1.0 / (231.0 * INCH * INCH * INCH)),
    }
}

/// A number with its unit, ready to print.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Shown {
    /// The digits, with a decimal point and an ASCII minus.
    pub number: String,
    /// The unit.
    pub unit: &'static str,
}

impl fmt::Display for Shown {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "{} {}", self.number, self.unit)
    }
}

/// A number as a person reads it.
///
/// Sizes and deviations go to the resolution of the tables (0.1 µm, 0.01 thou) without trailing zeros; temperatures
/// to whole degrees, to a tenth when they are not whole and below 100; the rest to four significant digits, three when
/// below 1. There is no negative zero.
///
/// # Example
/// ```
/// use hubgrip::quantity::{Measure, UnitSystem, show};
/// assert_eq!(show(Measure::Deviation, 12.5e-6, UnitSystem::Metric).to_string(), "12.5 µm");
/// assert_eq!(show(Measure::Pressure, 75e6, UnitSystem::Metric).to_string(), "75 MPa");
/// assert_eq!(show(Measure::Size, 0.0508, UnitSystem::Inch).to_string(), "2 in");
/// ```
pub fn show(measure: Measure, si: f64, system: UnitSystem) -> Shown {
    let unit = display_unit(measure, system);
    let value = unit.of(si);
    let number = match (measure, system) {
        (Measure::Size, UnitSystem::Metric) => decimals(value, 4),
        (Measure::Size, UnitSystem::Inch) => decimals(value, 5),
        (Measure::Deviation, UnitSystem::Metric) => decimals(value, 1),
        (Measure::Deviation, UnitSystem::Inch) => decimals(value, 2),
        (Measure::Temperature | Measure::TemperatureDifference, _) if value.abs() < 99.95 => {
            decimals(value, 1)
        }
        (Measure::Temperature | Measure::TemperatureDifference, _) => decimals(value, 0),
        _ => number(value, 4),
    };
    Shown { number, unit: unit.name }
}

/// What is shown of a number that does not exist.
const NOT_FINITE: &str = "n/a";

/// Takes a number that is a tie but for its last bits over the tie, away from zero.
const OVER_THE_TIE: f64 = 1.0 + 16.0 * f64::EPSILON;

/// A number rounded to so many decimals, ties away from zero.
fn decimals(value: f64, count: usize) -> String {
    trimmed(value * OVER_THE_TIE, count)
}

/// A number with so many decimals, trailing zeros dropped, never a negative zero.
fn trimmed(value: f64, decimals: usize) -> String {
    if !value.is_finite() {
        return NOT_FINITE.to_owned();
    }
    let text = format!("{value:.decimals$}");
    let text = if text.contains('.') { text.trim_end_matches('0').trim_end_matches('.') } else { &text };
    if text == "-0" { "0".to_owned() } else { text.to_owned() }
}

/// A number to so many significant digits, trailing zeros behind the point dropped.
///
/// A tie, as far as a double can tell one, goes away from zero, so that two ways of working out one number print
/// alike. From 1e-4 to 1e15 it is written plainly, outside with an exponent. The text reads back as a number; NaN
/// and infinity give `n/a`.
///
/// # Example
/// ```
/// use hubgrip::quantity::number;
/// assert_eq!(number(1234567.0, 4), "1235000");
/// assert_eq!(number(0.00204, 6), "0.00204");
/// assert_eq!(number(-0.0, 3), "0");
/// ```
pub fn number(value: f64, significant_digits: usize) -> String {
    if !value.is_finite() {
        return NOT_FINITE.to_owned();
    }
    if value == 0.0 {
        return "0".to_owned();
    }
    let digits = significant_digits.max(1);
    let scientific = format!("{:.*e}", digits - 1, value * OVER_THE_TIE);
    let (mantissa, exponent) = scientific.split_once('e').unwrap_or((&scientific, "0"));
    let exponent: i32 = exponent.parse().unwrap_or(0);
    if !(-4..15).contains(&exponent) {
        let mantissa = if mantissa.contains('.') {
            mantissa.trim_end_matches('0').trim_end_matches('.')
        } else {
            mantissa
        };
        return format!("{mantissa}e{exponent}");
    }
    let rounded: f64 = scientific.parse().unwrap_or(value);
    let decimals = usize::try_from(digits as i32 - 1 - exponent).unwrap_or(0);
    trimmed(rounded, decimals)
}
