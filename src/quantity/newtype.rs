//! Quantities as they stand in a file: text in, SI number out.

use std::fmt;
use std::str::FromStr;

use schemars::{JsonSchema, Schema, SchemaGenerator, json_schema};
use serde::de::{Deserialize, Deserializer, Error, Visitor};

use super::error::QuantityError;
use super::range::parse_number_range;
use super::read::parse;
use super::unit::Kind;

/// Stands between message and help in the text of a deserialisation error.
pub const HELP_SEPARATOR: char = '\u{1}';

/// The text of an error with its help behind the separator.
fn told(error: &QuantityError) -> String {
    match error.help() {
        Some(help) => format!("{error}{HELP_SEPARATOR}{help}"),
        None => error.to_string(),
    }
}

/// Reads a scalar as typed and turns it into a value.
struct Text<T> {
    expected: &'static str,
    read: fn(&str) -> Result<T, QuantityError>,
}

impl<T> Visitor<'_> for Text<T> {
    type Value = T;

    fn expecting(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(self.expected)
    }

    fn visit_str<E: Error>(self, text: &str) -> Result<T, E> {
        (self.read)(text).map_err(|error| E::custom(told(&error)))
    }
}

macro_rules! quantities {
    ($($name:ident, $kind:ident, $unit:literal, $example:literal $(, likely $likely:literal)?;)*) => {
        $(
            #[doc = concat!("A quantity of the kind ", stringify!($kind), " in a file, held in ", $unit, ".")]
            #[derive(Debug, Clone, Copy, PartialEq, PartialOrd)]
            pub struct $name(
                #[doc = concat!("The number, ", $unit, ".")]
                pub f64,
            );

            impl FromStr for $name {
                type Err = QuantityError;

                fn from_str(text: &str) -> Result<Self, QuantityError> {
                    parse(Kind::$kind, text)$(.map_err(|error| error.suggesting($likely)))?.map(Self)
                }
            }

            impl<'de> Deserialize<'de> for $name {
                fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Self, D::Error> {
                    let text = Text { expected: Kind::$kind.phrase(), read: |text| text.parse::<$name>() };
                    deserializer.deserialize_str(text)
                }
            }

            impl JsonSchema for $name {
                fn inline_schema() -> bool {
                    true
                }

                fn schema_name() -> std::borrow::Cow<'static, str> {
                    stringify!($name).into()
                }

                fn json_schema(_: &mut SchemaGenerator) -> Schema {
                    schema(Kind::$kind, $example)
                }
            }
        )*
    };
}

quantities! {
    Number, Number, "1", "0.8";
    Length, Length, "m", "60 mm";
    SmallLength, Length, "m", "25 um", likely "um";
    Force, Force, "N", "2 kN";
    Torque, Torque, "N·m", "900 N.m";
    Pressure, Pressure, "Pa", "355 MPa";
    Modulus, Pressure, "Pa", "210 GPa", likely "GPa";
    Temperature, Temperature, "K", "60 degC";
    TemperatureDifference, TemperatureDifference, "K", "40 K";
    Speed, Speed, "rad/s", "1450 rpm";
    Velocity, Velocity, "m/s", "2 mm/s";
    Mass, Mass, "kg", "12 kg";
    Time, Time, "s", "30 min";
    Density, Density, "kg/m³", "7850 kg/m3";
    ExpansionCoefficient, Expansion, "1/K", "11.5e-6 /K";
    Conductivity, Conductivity, "W/(m·K)", "45 W/m.K";
    SpecificHeat, SpecificHeat, "J/(kg·K)", "480 J/kg.K";
    HeatTransfer, HeatTransfer, "W/(m²·K)", "10 W/m2.K";
    Angle, Angle, "rad", "5 deg";
    Volume, Volume, "m³", "10 l";
}

/// A schema for editors: text with a number and a unit; a pure number may stand unquoted.
fn schema(kind: Kind, example: &str) -> Schema {
    if kind == Kind::Number {
        return json_schema!({ "type": ["number", "string"], "description": "a number", "examples": [example] });
    }
    json_schema!({
        "type": "string",
        "description": format!("{} with its unit: {}", kind.phrase(), kind.unit_names()),
        "pattern": "^\\s*[-+−]?\\s*\\.?[0-9][-+−.0-9eE/\\s]*[^-+−.0-9eE/\\s].*$",
        "examples": [example],
    })
}

/// A range of pure numbers in a file, such as `0.08 to 0.14`, or one number for both ends.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct NumberRange {
    /// Least value.
    pub low: f64,
    /// Greatest value.
    pub high: f64,
}

impl FromStr for NumberRange {
    type Err = QuantityError;

    fn from_str(text: &str) -> Result<Self, QuantityError> {
        parse_number_range(text).map(|(low, high)| Self { low, high })
    }
}

impl<'de> Deserialize<'de> for NumberRange {
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Self, D::Error> {
        let text =
            Text { expected: "a number or a range of numbers", read: |text| text.parse::<NumberRange>() };
        deserializer.deserialize_str(text)
    }
}

impl JsonSchema for NumberRange {
    fn inline_schema() -> bool {
        true
    }

    fn schema_name() -> std::borrow::Cow<'static, str> {
        "NumberRange".into()
    }

    fn json_schema(_: &mut SchemaGenerator) -> Schema {
        json_schema!({
            "type": ["number", "string"],
            "description": "a number or a range of numbers",
            "examples": ["0.12", "0.08 to 0.14"],
        })
    }
}
