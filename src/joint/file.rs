//! The joint file, version 1: every key with what it may hold.
//!
//! The doc comments of the keys are the descriptions in the JSON Schema. Every key is optional here; what must
//! be there is said where the joint is put together, so that a file tells all its faults in one run.

use schemars::JsonSchema;
use serde::Deserialize;

use super::assembly_keys::AssemblyKeys;
use super::bearing_keys::BearingKeys;
use super::leaf::{
    AllowWord, CriterionWord, DisplayWord, FlagWord, FrictionText, LimitsText, LubricationWord, YieldRuleWord,
};
use super::leaf::{FitText, MaterialName, UncertainSize};
use super::leaf::{MaterialKeys, Roughness, SmoothingAtWord, SmoothingText, Version};
use super::population_keys::PopulationKeys;
use super::written::{At, Line, Note, TextOr, Written};
use crate::quantity::{
    Force, Length, Number, NumberRange, Pressure, SmallLength, Speed, Temperature, Torque,
};

/// Version of the joint file that is read.
pub const VERSION: u32 = 1;

/// The sections with their keys, for a key that was put into the wrong one.
pub(crate) const SECTIONS: &[(&str, &[&str])] = &[
    ("shaft", &["name", "material", "bore", "roughness", "section", "steps", "bearing"]),
    ("hub", &["name", "material", "outer_diameter", "roughness", "section", "steps", "bearing"]),
    ("rings", &["name", "material", "bore", "outer_diameter", "roughness", "section"]),
    ("fit", &["hole", "measured"]),
    ("friction", &["holding", "pressing", "release", "lubrication"]),
    (
        "duty",
        &[
            "state",
            "torque",
            "axial_force",
            "temperature",
            "temperatures",
            "shaft_temperature",
            "hub_temperature",
            "speed",
            "inner_temperature",
            "outer_temperature",
            "inner_pressure",
            "outer_pressure",
            "bending_moment",
            "radial_force",
            "rotating_bending",
            "reversing",
            "relaxation",
        ],
    ),
    (
        "assembly",
        &[
            "method",
            "shop_temperature",
            "clearance",
            "form_error",
            "handling_allowance",
            "chamfer_angle",
            "bath",
            "medium",
            "oven_temperature",
            "hub_temperature_limit",
            "handling_time",
            "transfer_time",
            "chilled_length",
            "room",
            "vessel",
            "humidity",
            "temperature_lag",
        ],
    ),
    ("smoothing", &["factor", "rule", "at"]),
    (
        "require",
        &[
            "slip_safety",
            "yield_safety",
            "fracture_safety",
            "press_force",
            "hub_temperature",
            "allow",
            "plastic_share",
            "yield_rule",
        ],
    ),
    (
        "population",
        &[
            "hole",
            "shaft",
            "hub_roughness",
            "shaft_roughness",
            "friction",
            "pressing_friction",
            "hub_youngs_modulus",
            "shaft_youngs_modulus",
            "hub_temperature",
            "shaft_temperature",
        ],
    ),
];

/// The sections that have `key`, such as `shaft` and `hub`; none when no section has it.
pub(crate) fn sections_of(key: &str) -> Option<String> {
    let owners: Vec<String> = SECTIONS
        .iter()
        .filter(|(_, keys)| keys.contains(&key))
        .map(|(section, _)| format!("`{section}`"))
        .collect();
    if owners.is_empty() { None } else { Some(owners.join(" and ")) }
}

/// A press or shrink fit: two parts, their fit, what it must carry and how it is put together.
#[derive(Debug, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(crate) struct JointFile {
    /// Version of the joint file: 1.
    #[schemars(required)]
    pub(crate) joint_file: Option<Written<Version>>,
    /// What the joint is, in your words.
    pub(crate) title: Option<Written<Line>>,
    /// Drawing number and revision.
    pub(crate) drawing: Option<Written<Line>>,
    /// Whatever a reader should know.
    pub(crate) note: Option<Written<Note>>,
    /// Date as it shall be printed.
    pub(crate) date: Option<Written<Line>>,
    /// Nominal diameter of the mating surface. Silent with a bearing: that of its ring.
    pub(crate) diameter: Option<Written<Length>>,
    /// Length of the hub along the shaft. Silent with a bearing: its width.
    pub(crate) length: Option<Written<Length>>,
    /// Part of the length that carries nothing: chamfers and grooves. Silent: 0 mm.
    pub(crate) relief: Option<Written<Length>>,
    /// The inner part.
    pub(crate) shaft: Option<At<ShaftKeys>>,
    /// The outer part.
    pub(crate) hub: Option<At<HubKeys>>,
    /// The fit: a callout such as H7/s6 or FN 4, or the limits of hole and shaft, or two measured parts.
    pub(crate) fit: Option<GivenFit>,
    /// Coefficients of friction. Silent: from the library by pair of materials and method of assembly.
    pub(crate) friction: Option<At<TextOr<FrictionText, FrictionKeys>>>,
    /// Service states. Silent: one state at shop temperature without load.
    pub(crate) duty: Option<At<Vec<At<StateKeys>>>>,
    /// How the joint is put together.
    pub(crate) assembly: Option<At<AssemblyKeys>>,
    /// Loss of interference as the peaks of the roughness flatten: a rule by name, or its parts.
    pub(crate) smoothing: Option<At<TextOr<SmoothingText, SmoothingKeys>>>,
    /// Strength criterion of ductile parts. Silent: von Mises.
    pub(crate) criterion: Option<Written<CriterionWord>>,
    /// What must be met.
    pub(crate) require: Option<At<RequireKeys>>,
    /// How the parts scatter, for scatter and sort.
    pub(crate) population: Option<At<PopulationKeys>>,
    /// Units on the terminal and in the report. Silent: metric.
    pub(crate) display: Option<Written<DisplayWord>>,
    /// Two rings or more from the innermost outwards, in place of shaft and hub.
    pub(crate) rings: Option<At<Vec<At<RingKeys>>>>,
    /// The fits between neighbouring rings, one less than there are rings.
    pub(crate) fits: Option<At<Vec<GivenFit>>>,
    /// Numbers of the fits in the order in which they are joined. Silent: from the innermost outwards.
    pub(crate) order: Option<At<Vec<Written<Number>>>>,
}

/// The inner part.
#[derive(Debug, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(crate) struct ShaftKeys {
    /// What it is called. Silent: shaft.
    pub(crate) name: Option<Written<Line>>,
    /// Material of the library by name, or written here with the keys of a library file. Silent with a bearing: 100Cr6.
    pub(crate) material: Option<At<TextOr<MaterialName, MaterialKeys>>>,
    /// Diameter of its bore. Silent: 0 mm, a solid shaft.
    pub(crate) bore: Option<Written<Length>>,
    /// Roughness of its mating surface, such as Rz 6.3 um.
    pub(crate) roughness: Option<Written<Roughness>>,
    /// Ruling section that picks its strength. Silent: its diameter.
    pub(crate) section: Option<Written<Length>>,
    /// A bearing whose outer ring is the inner part, in a housing.
    pub(crate) bearing: Option<At<BearingKeys>>,
    /// A shaft whose bore changes: length and bore of each piece, from the end that enters first.
    pub(crate) steps: Option<At<Vec<At<ShaftStepKeys>>>>,
}

/// The outer part.
#[derive(Debug, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(crate) struct HubKeys {
    /// What it is called. Silent: hub.
    pub(crate) name: Option<Written<Line>>,
    /// Material of the library by name, or written here with the keys of a library file. Silent with a bearing: 100Cr6.
    pub(crate) material: Option<At<TextOr<MaterialName, MaterialKeys>>>,
    /// Its outer diameter; the largest of the steps when it is stepped.
    pub(crate) outer_diameter: Option<Written<Length>>,
    /// Roughness of its bore, such as Rz 10 um.
    pub(crate) roughness: Option<Written<Roughness>>,
    /// Ruling section that picks its strength. Silent: the thickness of its wall.
    pub(crate) section: Option<Written<Length>>,
    /// A bearing whose inner ring is the outer part, on a shaft.
    pub(crate) bearing: Option<At<BearingKeys>>,
    /// A stepped hub: length and outer diameter of each piece, from the end that enters first.
    pub(crate) steps: Option<At<Vec<At<HubStepKeys>>>>,
}

/// One piece of a stepped hub.
#[derive(Debug, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(crate) struct HubStepKeys {
    /// Its length along the shaft.
    #[schemars(required)]
    pub(crate) length: Option<Written<Length>>,
    /// Outer diameter of the hub there.
    #[schemars(required)]
    pub(crate) outer_diameter: Option<Written<Length>>,
}

/// One piece of a shaft whose bore changes.
#[derive(Debug, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(crate) struct ShaftStepKeys {
    /// Its length along the shaft.
    #[schemars(required)]
    pub(crate) length: Option<Written<Length>>,
    /// Bore of the shaft there.
    #[schemars(required)]
    pub(crate) bore: Option<Written<Length>>,
}

/// One of several rings.
#[derive(Debug, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(crate) struct RingKeys {
    /// What it is called. Silent: ring and its number.
    pub(crate) name: Option<Written<Line>>,
    /// Material of the library by name, or written here with the keys of a library file.
    #[schemars(required)]
    pub(crate) material: Option<At<TextOr<MaterialName, MaterialKeys>>>,
    /// Bore of the innermost ring. Silent: 0 mm, a solid core.
    pub(crate) bore: Option<Written<Length>>,
    /// Its outer diameter.
    #[schemars(required)]
    pub(crate) outer_diameter: Option<Written<Length>>,
    /// Roughness of its mating surfaces, such as Rz 6.3 um.
    pub(crate) roughness: Option<Written<Roughness>>,
    /// Ruling section that picks its strength. Silent: the thickness of its wall, or the diameter of a solid core.
    pub(crate) section: Option<Written<Length>>,
}

/// A fit as a callout, or with keys.
pub(crate) type GivenFit = At<TextOr<FitText, FitKeys>>;

/// The fit with hole and shaft apart, or two measured parts.
#[derive(Debug, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(crate) struct FitKeys {
    /// Class or limits of the hole.
    pub(crate) hole: Option<At<TextOr<LimitsText, LimitKeys>>>,
    /// Class or limits of the shaft.
    pub(crate) shaft: Option<At<TextOr<LimitsText, LimitKeys>>>,
    /// Two parts as measured.
    pub(crate) measured: Option<At<MeasuredKeys>>,
}

/// Limits of one member: deviations from the diameter (lower, upper), or sizes (min, max).
#[derive(Debug, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(crate) struct LimitKeys {
    /// Lower deviation from the nominal diameter, with its sign.
    pub(crate) lower: Option<Written<SmallLength>>,
    /// Upper deviation from the nominal diameter, with its sign.
    pub(crate) upper: Option<Written<SmallLength>>,
    /// Smallest size.
    pub(crate) min: Option<Written<Length>>,
    /// Largest size.
    pub(crate) max: Option<Written<Length>>,
}

/// Two parts as measured, at 20 degC.
#[derive(Debug, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(crate) struct MeasuredKeys {
    /// Measured diameter of the hole.
    #[schemars(required)]
    pub(crate) hole: Option<Written<UncertainSize>>,
    /// Measured diameter of the shaft.
    #[schemars(required)]
    pub(crate) shaft: Option<Written<UncertainSize>>,
    /// Uncertainty of each of the two, plus and minus.
    pub(crate) uncertainty: Option<Written<SmallLength>>,
}

/// Coefficients of friction, each a number or a range such as 0.08 to 0.14.
#[derive(Debug, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(crate) struct FrictionKeys {
    /// Against slip in service; the low end is used.
    pub(crate) holding: Option<Written<NumberRange>>,
    /// While pressing in; the high end sizes the press.
    pub(crate) pressing: Option<Written<NumberRange>>,
    /// At first movement when pushing out.
    pub(crate) release: Option<Written<NumberRange>>,
    /// State of the surfaces, such as dry, oiled or degreased, for the library's coefficients.
    pub(crate) lubrication: Option<Written<LubricationWord>>,
}

/// One service state.
#[derive(Debug, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(crate) struct StateKeys {
    /// Its name.
    pub(crate) state: Option<Written<Line>>,
    /// Torque to be carried.
    pub(crate) torque: Option<Written<Torque>>,
    /// Axial force to be carried.
    pub(crate) axial_force: Option<Written<Force>>,
    /// Temperature of all parts.
    pub(crate) temperature: Option<Written<Temperature>>,
    /// Temperature of each ring, innermost first.
    pub(crate) temperatures: Option<At<Vec<Written<Temperature>>>>,
    /// Temperature of the shaft.
    pub(crate) shaft_temperature: Option<Written<Temperature>>,
    /// Temperature of the hub.
    pub(crate) hub_temperature: Option<Written<Temperature>>,
    /// Rotational speed. Silent: at rest.
    pub(crate) speed: Option<Written<Speed>>,
    /// Temperature of the innermost face, with `outer_temperature`: steady conduction through the parts.
    pub(crate) inner_temperature: Option<Written<Temperature>>,
    /// Temperature of the outermost face.
    pub(crate) outer_temperature: Option<Written<Temperature>>,
    /// Pressure in the bore of the innermost part.
    pub(crate) inner_pressure: Option<Written<Pressure>>,
    /// Pressure round the outermost part.
    pub(crate) outer_pressure: Option<Written<Pressure>>,
    /// Bending moment about the middle of the joint.
    pub(crate) bending_moment: Option<Written<Torque>>,
    /// Radial force on the joint.
    pub(crate) radial_force: Option<Written<Force>>,
    /// Whether the bending turns with the shaft and so fatigues it.
    pub(crate) rotating_bending: Option<Written<FlagWord>>,
    /// Whether the torque reverses.
    pub(crate) reversing: Option<Written<FlagWord>>,
    /// Share of the contact pressure that relaxation leaves, 0 to 1. Silent: all of it.
    pub(crate) relaxation: Option<Written<Number>>,
}

/// Loss of interference by smoothing.
#[derive(Debug, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(crate) struct SmoothingKeys {
    /// Share of (Rz shaft + Rz hub) that is lost on the diameter.
    pub(crate) factor: Option<Written<Number>>,
    /// A published rule by name.
    pub(crate) rule: Option<Written<SmoothingText>>,
    /// At which pairs it is lost. Silent: loosest, lost for holding and kept for stress.
    pub(crate) at: Option<Written<SmoothingAtWord>>,
}

/// What must be met.
#[derive(Debug, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(crate) struct RequireKeys {
    /// Least safety against slip, at the loosest pair.
    pub(crate) slip_safety: Option<Written<Number>>,
    /// Least safety against yield of ductile parts, at the tightest pair.
    pub(crate) yield_safety: Option<Written<Number>>,
    /// Least safety against fracture of brittle parts, at the tightest pair.
    pub(crate) fracture_safety: Option<Written<Number>>,
    /// Greatest press-in force.
    pub(crate) press_force: Option<Written<Force>>,
    /// Highest hub temperature while joining, such as what the oven gives; the limit of its material holds as well.
    pub(crate) hub_temperature: Option<Written<Temperature>>,
    /// Whether a ductile hub may yield by design: elastic or plastic. Silent: elastic.
    pub(crate) allow: Option<Written<AllowWord>>,
    /// Greatest share of the hub's section that may be plastic. Silent: 0.3.
    pub(crate) plastic_share: Option<Written<Number>>,
    /// Yield rule of the elastic-plastic hub. Silent: Tresca.
    pub(crate) yield_rule: Option<Written<YieldRuleWord>>,
}
