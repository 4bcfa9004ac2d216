//! Families of materials.

use std::fmt;

use schemars::JsonSchema;
use serde::{Deserialize, Serialize};

/// What a material is made of, as far as friction is concerned.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Default, Serialize, Deserialize, JsonSchema)]
#[serde(rename_all = "lowercase")]
pub enum Family {
    /// Carbon, alloy, tool and bearing steel.
    Steel,
    /// Cast steel.
    #[serde(rename = "cast steel")]
    CastSteel,
    /// Austenitic, ferritic, martensitic and duplex stainless steel.
    #[serde(rename = "stainless steel")]
    StainlessSteel,
    /// Cast iron with flake graphite, EN-GJL.
    #[serde(rename = "grey iron")]
    GreyIron,
    /// Cast iron with spheroidal graphite, EN-GJS.
    #[serde(rename = "spheroidal iron")]
    SpheroidalIron,
    /// Malleable cast iron, EN-GJMW and EN-GJMB.
    #[serde(rename = "malleable iron")]
    MalleableIron,
    /// Wrought and cast aluminium.
    Aluminium,
    /// Magnesium.
    Magnesium,
    /// Tin, leaded tin and aluminium bronze.
    Bronze,
    /// Brass.
    Brass,
    /// Copper and low-alloyed copper.
    Copper,
    /// Titanium.
    Titanium,
    /// Nickel and nickel alloys.
    Nickel,
    /// Zinc.
    Zinc,
    /// Cemented carbide.
    #[serde(rename = "cemented carbide")]
    CementedCarbide,
    /// Plastics.
    Polymer,
    /// None of these, or not stated.
    #[default]
    Other,
}

impl Family {
    /// The family as written in a file.
    pub fn name(self) -> &'static str {
        match self {
            Self::Steel => "steel",
            Self::CastSteel => "cast steel",
            Self::StainlessSteel => "stainless steel",
            Self::GreyIron => "grey iron",
            Self::SpheroidalIron => "spheroidal iron",
            Self::MalleableIron => "malleable iron",
            Self::Aluminium => "aluminium",
            Self::Magnesium => "magnesium",
            Self::Bronze => "bronze",
            Self::Brass => "brass",
            Self::Copper => "copper",
            Self::Titanium => "titanium",
            Self::Nickel => "nickel",
            Self::Zinc => "zinc",
            Self::CementedCarbide => "cemented carbide",
            Self::Polymer => "polymer",
            Self::Other => "other",
        }
    }
}

impl fmt::Display for Family {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(self.name())
    }
}
