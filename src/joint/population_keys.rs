//! The keys of `population`: how hole, shaft and everything else scatter.

use std::borrow::Cow;

use schemars::{JsonSchema, Schema, SchemaGenerator, json_schema};
use serde::Deserialize;

use super::written::{At, Leaf, Refused, TextOr, Written, words};
use crate::quantity::Number;

/// How the parts scatter, for `hubgrip scatter` and `hubgrip sort`.
#[derive(Debug, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(crate) struct PopulationKeys {
    /// Size of the hole. Silent: normal in the middle of its limits with Cp 1.
    pub(crate) hole: Option<At<TextOr<VariationText, VariationKeys>>>,
    /// Size of the shaft. Silent: normal in the middle of its limits with Cp 1.
    pub(crate) shaft: Option<At<TextOr<VariationText, VariationKeys>>>,
    /// Roughness Rz of the hub's bore. Silent: always that of `hub`.
    pub(crate) hub_roughness: Option<At<TextOr<VariationText, VariationKeys>>>,
    /// Roughness Rz of the shaft. Silent: always that of `shaft`.
    pub(crate) shaft_roughness: Option<At<TextOr<VariationText, VariationKeys>>>,
    /// Friction against slip. Silent: every value of the range of `friction.holding` alike.
    pub(crate) friction: Option<At<TextOr<VariationText, VariationKeys>>>,
    /// Friction while pressing in. Silent: every value of the range of `friction.pressing` alike.
    pub(crate) pressing_friction: Option<At<TextOr<VariationText, VariationKeys>>>,
    /// Young's modulus of the hub. Silent: always that of its material.
    pub(crate) hub_youngs_modulus: Option<At<TextOr<VariationText, VariationKeys>>>,
    /// Young's modulus of the shaft. Silent: always that of its material.
    pub(crate) shaft_youngs_modulus: Option<At<TextOr<VariationText, VariationKeys>>>,
    /// Difference of the hub's temperature from that of each state. Silent: none.
    pub(crate) hub_temperature: Option<At<TextOr<VariationText, VariationKeys>>>,
    /// Difference of the shaft's temperature from that of each state. Silent: none.
    pub(crate) shaft_temperature: Option<At<TextOr<VariationText, VariationKeys>>>,
}

/// How one quantity scatters: by sd, by cp, uniform, or measured.
#[derive(Debug, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(crate) struct VariationKeys {
    /// Mean. Silent: the middle of the limits, the value of the joint, or no difference.
    pub(crate) mean: Option<Written<VariationText>>,
    /// Standard deviation of a normal.
    pub(crate) sd: Option<Written<VariationText>>,
    /// Process capability Cp against the limits of the fit, for hole and shaft.
    pub(crate) cp: Option<Written<Number>>,
    /// Cpk. Silent: Cp, the mean is in the middle.
    pub(crate) cpk: Option<Written<Number>>,
    /// Limit to which the mean has moved: upper or lower. Silent: the least-material limit.
    pub(crate) toward: Option<Written<TowardWord>>,
    /// Skewness of a skew normal, -0.95 to 0.95.
    pub(crate) skewness: Option<Written<Number>>,
    /// Where inspection cuts the normal: limits, or a range such as 60.000 to 60.030 mm.
    pub(crate) truncated: Option<Written<VariationText>>,
    /// Every value alike: limits, or a range.
    pub(crate) uniform: Option<Written<VariationText>>,
    /// CSV file of measurements, beside the joint file.
    pub(crate) measured: Option<Written<VariationText>>,
}

words! {
    /// Limit to which a mean has moved.
    TowardWord: bool, "limit",
    "upper" => true,
    "lower" => false,
}

/// A value, a range, `normal` or `uniform`; its unit is that of the quantity.
#[derive(Debug, Clone)]
pub(crate) struct VariationText;

impl Leaf for VariationText {
    type Value = String;

    fn read(text: &str) -> Result<String, Refused> {
        Ok(text.trim().to_owned())
    }
}

impl JsonSchema for VariationText {
    fn schema_name() -> Cow<'static, str> {
        "VariationText".into()
    }

    fn json_schema(_: &mut SchemaGenerator) -> Schema {
        json_schema!({ "type": ["string", "number"] })
    }
}
