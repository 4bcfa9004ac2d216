//! Text with units in, SI numbers out, and back for display.
//!
//! Units exist at the edges only: [`parse`] turns what a person writes into an SI number, [`show`] turns an
//! SI number into what a person reads, and [`written`] gives text that [`parse`] reads back to the same number.
//!
//! A quantity is a number, optional blanks, and a unit; [`unit::UNITS`] lists every spelling.
//!
//! | written | read as |
//! |---|---|
//! | `60 mm`, `60mm`, `6e1 mm`, `+60.0 mm` | 0.06 m |
//! | `25 um`, `25 µm`, `25 μm` | 0.000025 m |
//! | `2-3/16 in`, `2 3/16 in`, `3/8 in` | whole inches and a fraction |
//! | `900 N.m`, `900 N·m`, `900 N*m`, `900 Nm`, `900 N m` | 900 N·m |
//! | `210 GPa`, `355 N/mm2`, `355 N/mm²`, `30 ksi` | pressure and stress |
//! | `60 degC`, `60 °C`, `140 degF`, `333.15 K` | a temperature |
//! | `8 to 14 um`, `0.008 mm to 14 um` | a range, by [`parse_range`] |
//! | `±10 um`, `+/- 10 um`, `+30 / -10 um` | deviations, by [`parse_plus_minus`] |
//!
//! Case matters, because mm and Mm differ by a factor of 10⁹. A temperature and a temperature difference are
//! different kinds: `100 degF` is 310.9 K, but a difference of `100 degF` is 55.6 K. Not read: a number without
//! a unit where one is due, NaN, infinity, hexadecimal, digits grouped by `_`, blank or comma, a decimal comma.
//!
//! # Example
//! ```
//! use hubgrip::quantity::{Kind, Measure, UnitSystem, parse, show, written};
//! let diameter = parse(Kind::Length, "2-3/16 in")?;
//! assert_eq!(diameter, 0.0555625);
//! assert_eq!(show(Measure::Size, diameter, UnitSystem::Metric).to_string(), "55.5625 mm");
//! assert_eq!(written(Kind::Length, diameter), "55.5625 mm");
//! let error = parse(Kind::Length, "80").unwrap_err();
//! assert_eq!(error.to_string(), "80 has no unit: write 80 mm");
//! # Ok::<(), hubgrip::quantity::QuantityError>(())
//! ```

mod error;
mod factor;
mod newtype;
mod range;
mod read;
mod scan;
mod show;
pub mod unit;
mod write;

#[cfg(test)]
mod tests;

pub use error::QuantityError;
pub use factor::{factor_found, factor_required};
pub use newtype::{
    Angle, Conductivity, Density, ExpansionCoefficient, Force, HELP_SEPARATOR, HeatTransfer, Length, Mass,
    Modulus, Number, NumberRange, Pressure, SmallLength, SpecificHeat, Speed, Temperature,
    TemperatureDifference, Time, Torque, Velocity, Volume,
};
pub use range::{parse_number_range, parse_plus_minus, parse_range, parse_with_uncertainty};
pub(crate) use read::GREATEST;
pub use read::{parse, parse_number};
pub use show::{DisplayUnit, Measure, Shown, display_unit, number, show};
pub use unit::Kind;
pub use write::written;

/// Units shown to the reader.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum UnitSystem {
    /// Millimetres, newtons, megapascals, degrees Celsius.
    #[default]
    Metric,
    /// Inches, pounds-force, kilopounds per square inch, degrees Fahrenheit.
    Inch,
}
