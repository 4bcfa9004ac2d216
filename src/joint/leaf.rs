//! What each text of a joint file may say.

use std::borrow::Cow;

use schemars::{JsonSchema, Schema, SchemaGenerator, json_schema};
use serde::de::{Deserialize, Deserializer, IgnoredAny};

use super::file::VERSION;
use super::practice::Heating;
use super::written::{Leaf, Refused, Words, read_word, words};
use super::{Bath, Method, SmoothingAt};
use crate::material::friction::Lubrication;
use crate::material::record::MaterialRecord;
use crate::mechanics::criteria::DuctileCriterion;
use crate::mechanics::plastic::YieldRule;
use crate::quantity::{self, Kind, UnitSystem};

words! {
    /// Method of assembly.
    MethodWord: Method, "method of assembly",
    "press" => Method::Press,
    "heat hub" => Method::HeatHub,
    "chill shaft" => Method::ChillShaft,
    "heat and chill" => Method::HeatAndChill,
}

words! {
    /// Cold bath.
    BathWord: Bath, "cold bath",
    "dry ice" => Bath::DryIce,
    "dry ice in alcohol" => Bath::DryIceInAlcohol,
    "dry ice in acetone" => Bath::DryIceInAcetone,
    "liquid nitrogen" => Bath::LiquidNitrogen,
}

words! {
    /// What the hub is heated in.
    HeatingWord: Heating, "way of heating",
    "forced oven" => Heating::ForcedOven,
    "still oven" => Heating::StillOven,
    "oil bath" => Heating::OilBath,
    "induction" => Heating::Induction,
}

words! {
    /// Strength criterion of ductile parts.
    CriterionWord: DuctileCriterion, "strength criterion for ductile parts",
    "von Mises" => DuctileCriterion::VonMises,
    "Tresca" => DuctileCriterion::Tresca,
}

words! {
    /// Units on the terminal and in the report.
    DisplayWord: UnitSystem, "unit system",
    "metric" => UnitSystem::Metric,
    "inch" => UnitSystem::Inch,
}

words! {
    /// At which pairs the smoothing loss is taken.
    SmoothingAtWord: SmoothingAt, "choice of pairs",
    "loosest" => SmoothingAt::Loosest,
    "both" => SmoothingAt::Both,
    "none" => SmoothingAt::None,
}

words! {
    /// What is on the seats while they are joined.
    LubricationWord: Lubrication, "state of the seats",
    "oiled" => Lubrication::Oiled,
    "dry" => Lubrication::Dry,
    "degreased" => Lubrication::Degreased,
}

/// Yes or no.
#[derive(Debug, Clone)]
pub(crate) struct FlagWord;

impl Words for FlagWord {
    type Value = bool;
    const SUBJECT: &'static str = "yes or no";
    const WORDS: &'static [(&'static str, bool)] =
        &[("yes", true), ("no", false), ("true", true), ("false", false)];
}

impl Leaf for FlagWord {
    type Value = bool;

    fn read(text: &str) -> Result<bool, Refused> {
        read_word::<Self>(text)
    }
}

impl JsonSchema for FlagWord {
    fn schema_name() -> Cow<'static, str> {
        "FlagWord".into()
    }

    /// YAML itself takes `true` for no text, and YAML 1.1 `yes` as well.
    fn json_schema(_: &mut SchemaGenerator) -> Schema {
        json_schema!({ "type": ["string", "boolean"], "enum": ["yes", "no", "true", "false", true, false] })
    }
}

words! {
    /// Whether a ductile hub may yield by design.
    AllowWord: bool, "design of the hub",
    "elastic" => false,
    "plastic" => true,
}

words! {
    /// Yield rule of the elastic-plastic hub.
    YieldRuleWord: YieldRule, "yield rule",
    "Tresca" => YieldRule::Tresca,
    "modified Tresca" => YieldRule::ModifiedTresca,
    "von Mises" => YieldRule::VonMises,
}

/// The version of the joint file.
#[derive(Debug, Clone)]
pub(crate) struct Version;

impl Leaf for Version {
    type Value = ();

    fn read(text: &str) -> Result<(), Refused> {
        let text = text.trim();
        match text.parse::<u32>() {
            Ok(VERSION) => Ok(()),
            Ok(other) => Err(Refused::new(
                format!("written for joint_file {other}, this hubgrip reads {VERSION}"),
                "use a hubgrip that reads it, or write the joint anew from `hubgrip new`",
            )),
            Err(_) => Err(Refused::new(
                format!("`{text}` is not a version of the joint file"),
                format!("write `joint_file: {VERSION}`"),
            )),
        }
    }
}

impl JsonSchema for Version {
    fn inline_schema() -> bool {
        true
    }

    fn schema_name() -> Cow<'static, str> {
        "Version".into()
    }

    fn json_schema(_: &mut SchemaGenerator) -> Schema {
        json_schema!({ "const": VERSION })
    }
}

/// A text whose meaning is found where the joint is put together.
macro_rules! texts {
    ($($(#[$doc:meta])* $name:ident $types:tt;)*) => {
        $(
            $(#[$doc])*
            #[derive(Debug, Clone)]
            pub(crate) struct $name;

            impl Leaf for $name {
                type Value = String;

                fn read(text: &str) -> Result<String, Refused> {
                    Ok(text.trim().to_owned())
                }
            }

            impl JsonSchema for $name {
                fn schema_name() -> Cow<'static, str> {
                    stringify!($name).into()
                }

                fn json_schema(_: &mut SchemaGenerator) -> Schema {
                    json_schema!({ "type": $types })
                }
            }
        )*
    };
}

texts! {
    /// A fit such as `H7/s6` or `FN 4`.
    FitText "string";
    /// A class such as `H7`, or deviations such as `±10 um`.
    LimitsText "string";
    /// A material of the library; some are called by a number.
    MaterialName ["string", "number"];
    /// A coefficient of friction for all three, or the state of the surfaces.
    FrictionText ["string", "number"];
    /// A published rule for the loss by smoothing.
    SmoothingText "string";
}

/// A measured diameter, such as `60.012 mm`, or with its own uncertainty, such as `60.012 mm ± 2 um`.
#[derive(Debug, Clone)]
pub(crate) struct UncertainSize;

impl Leaf for UncertainSize {
    /// Diameter and uncertainty, m.
    type Value = (f64, Option<f64>);

    fn read(text: &str) -> Result<Self::Value, Refused> {
        if text.contains('±') || text.contains("+/-") || text.contains("+-") {
            let (size, uncertainty) = quantity::parse_with_uncertainty(Kind::Length, text)?;
            return Ok((size, Some(uncertainty)));
        }
        Ok((quantity::parse(Kind::Length, text)?, None))
    }
}

impl JsonSchema for UncertainSize {
    fn inline_schema() -> bool {
        true
    }

    fn schema_name() -> Cow<'static, str> {
        "UncertainSize".into()
    }

    fn json_schema(_: &mut SchemaGenerator) -> Schema {
        json_schema!({ "type": "string" })
    }
}

/// Roughness as written.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) enum GivenRoughness {
    /// Mean roughness depth Rz, m.
    Rz(f64),
    /// Arithmetic mean roughness Ra, m.
    Ra(f64),
}

/// Greatest roughness that is read, m: rougher than any machined seat (common practice, no source).
pub(crate) const ROUGHEST: f64 = 0.5e-3;

/// A roughness, such as `Rz 6.3 um` or `Ra 0.8 um`.
#[derive(Debug, Clone)]
pub(crate) struct Roughness;

impl Leaf for Roughness {
    type Value = GivenRoughness;

    fn read(text: &str) -> Result<GivenRoughness, Refused> {
        let text = text.trim();
        let (symbol, depth) =
            text.split_at(text.find(|c: char| !c.is_ascii_alphabetic()).unwrap_or(text.len()));
        let of = |given: fn(f64) -> GivenRoughness| -> Result<GivenRoughness, Refused> {
            let depth = quantity::parse(Kind::Length, depth).map_err(|error| error.suggesting("um"))?;
            if depth < 0.0 {
                return Err(Refused { message: format!("the roughness {text} is negative"), help: None });
            }
            if depth > ROUGHEST {
                return Err(Refused::new(
                    format!("the roughness {text} is above 0.5 mm: no machined seat is so rough"),
                    "is um meant, as in `Rz 6.3 um`?",
                ));
            }
            Ok(given(depth))
        };
        match symbol.to_ascii_lowercase().as_str() {
            "rz" => of(GivenRoughness::Rz),
            "ra" => of(GivenRoughness::Ra),
            "" => Err(Refused::new(
                format!("`{text}` does not say which roughness it is"),
                format!("write `Rz {text}` or `Ra {text}`"),
            )),
            other => Err(Refused::new(
                format!("`{other}` is not a roughness that is read here"),
                "write Rz or Ra, such as `Rz 6.3 um`",
            )),
        }
    }
}

impl JsonSchema for Roughness {
    fn schema_name() -> Cow<'static, str> {
        "Roughness".into()
    }

    fn json_schema(_: &mut SchemaGenerator) -> Schema {
        json_schema!({ "type": "string", "pattern": "^\\s*[Rr][AaZz]\\s*[-+.0-9]" })
    }
}

/// A material written in the joint file; read where the joint is put together.
#[derive(Debug, Clone)]
pub(crate) struct MaterialKeys;

impl<'de> Deserialize<'de> for MaterialKeys {
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Self, D::Error> {
        IgnoredAny::deserialize(deserializer).map(|_| Self)
    }
}

impl JsonSchema for MaterialKeys {
    fn inline_schema() -> bool {
        true
    }

    fn schema_name() -> Cow<'static, str> {
        MaterialRecord::schema_name()
    }

    fn json_schema(generator: &mut SchemaGenerator) -> Schema {
        generator.subschema_for::<MaterialRecord>()
    }
}
