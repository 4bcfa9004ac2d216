//! The keys of `bearing`: a rolling bearing whose ring sits on the shaft or in the housing.

use schemars::JsonSchema;
use serde::Deserialize;

use super::written::{Written, words};
use crate::assembly::bearing::BearingKind;
use crate::assembly::bearing_tables::{BearingClass, ClearanceGroup};
use crate::quantity::{Length, TemperatureDifference};

words! {
    /// Kind of rolling bearing.
    BearingKindWord: BearingKind, "kind of bearing",
    "ball" => BearingKind::Ball,
    "roller" => BearingKind::Roller,
}

words! {
    /// Group of radial internal clearance, ISO 5753-1.
    ClearanceWord: ClearanceGroup, "clearance group of ISO 5753-1",
    "CN" => ClearanceGroup::CN,
    "C2" => ClearanceGroup::C2,
    "C3" => ClearanceGroup::C3,
    "C4" => ClearanceGroup::C4,
    "C5" => ClearanceGroup::C5,
}

words! {
    /// Tolerance class of a bearing, ISO 492.
    BearingClassWord: BearingClass, "tolerance class of ISO 492",
    "normal" => BearingClass::Normal,
    "class 6" => BearingClass::Class6,
    "class 5" => BearingClass::Class5,
    "6" => BearingClass::Class6,
    "5" => BearingClass::Class5,
}

/// A rolling bearing: in `hub` its inner ring sits on the shaft, in `shaft` its outer ring sits in the housing.
#[derive(Debug, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(crate) struct BearingKeys {
    /// Bore of the bearing.
    #[schemars(required)]
    pub(crate) bore: Option<Written<Length>>,
    /// Outside diameter of the bearing.
    #[schemars(required)]
    pub(crate) outside_diameter: Option<Written<Length>>,
    /// Width of the seated ring.
    #[schemars(required)]
    pub(crate) width: Option<Written<Length>>,
    /// Kind of bearing: ball or roller. Silent: ball.
    #[serde(rename = "type")]
    pub(crate) kind: Option<Written<BearingKindWord>>,
    /// Group of radial internal clearance of ISO 5753-1. Silent: CN.
    pub(crate) clearance: Option<Written<ClearanceWord>>,
    /// Tolerance class of ISO 492. Silent: normal.
    pub(crate) class: Option<Written<BearingClassWord>>,
    /// Raceway diameter of the inner ring. Silent: estimated from bore and outside diameter.
    pub(crate) inner_raceway: Option<Written<Length>>,
    /// Raceway diameter of the outer ring. Silent: estimated from bore and outside diameter.
    pub(crate) outer_raceway: Option<Written<Length>>,
    /// How much warmer the inner ring runs than the outer in states above the shop temperature. Silent: 10 K.
    pub(crate) inner_hotter_by: Option<Written<TemperatureDifference>>,
}
