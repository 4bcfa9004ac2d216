//! The keys of `assembly` in the joint file.

use schemars::JsonSchema;
use serde::Deserialize;

use super::leaf::{BathWord, HeatingWord, MethodWord};
use super::written::{At, Written};
use crate::quantity::{Angle, Length, Number, SmallLength, Temperature, Time, Volume};

/// How the joint is put together.
#[derive(Debug, Default, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(crate) struct AssemblyKeys {
    /// Method. Silent: press.
    pub(crate) method: Option<Written<MethodWord>>,
    /// Temperature of the shop. Silent: 20 degC.
    pub(crate) shop_temperature: Option<Written<Temperature>>,
    /// Diametral clearance wanted while joining hot or cold. Silent: a thousandth of the diameter.
    pub(crate) clearance: Option<Written<SmallLength>>,
    /// Form error of both seats together, on the diameter, added to the clearance. Silent: 0 um.
    pub(crate) form_error: Option<Written<SmallLength>>,
    /// Further diametral clearance for handling. Silent: 0 um.
    pub(crate) handling_allowance: Option<Written<SmallLength>>,
    /// Angle of the lead-in chamfer to the axis. Silent: 5 deg.
    pub(crate) chamfer_angle: Option<Written<Angle>>,
    /// Cold bath: dry ice, dry ice in alcohol, dry ice in acetone or liquid nitrogen. Silent: dry ice.
    pub(crate) bath: Option<Written<BathWord>>,
    /// What the hub is heated in. Silent: forced oven.
    pub(crate) medium: Option<Written<HeatingWord>>,
    /// What the oven or the oil is set to. Silent: so that 99 % of the rise is the temperature that clears.
    pub(crate) oven_temperature: Option<Written<Temperature>>,
    /// Highest temperature the hub may have; the limit of its material holds as well.
    pub(crate) hub_temperature_limit: Option<Written<Temperature>>,
    /// Time that is needed from oven or bath to seated; judged when it is given.
    pub(crate) handling_time: Option<Written<Time>>,
    /// Time from oven or bath until the parts begin to overlap. Silent: 0 s, the safe side.
    pub(crate) transfer_time: Option<Written<Time>>,
    /// Length of the shaft that is chilled. Silent: that of the hub.
    pub(crate) chilled_length: Option<Written<Length>>,
    /// The room of the cold bath, for the oxygen that is left in it.
    pub(crate) room: Option<At<RoomKeys>>,
    /// The vessel of the cold bath. Silent: twice the volume round the part.
    pub(crate) vessel: Option<At<VesselKeys>>,
    /// Relative humidity of the room, 0 to 1, for the frost on a chilled part. Silent: 0.5.
    pub(crate) humidity: Option<Written<Number>>,
    /// Share of the hub's rise by which the shaft lags behind when heat takes the joint apart. Silent: 0.5.
    pub(crate) temperature_lag: Option<Written<Number>>,
}

/// The room of the cold bath.
#[derive(Debug, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(crate) struct RoomKeys {
    /// Its volume.
    #[schemars(required)]
    pub(crate) volume: Option<Written<Volume>>,
    /// Changes of its air in an hour. Silent: 0, not ventilated.
    pub(crate) air_changes: Option<Written<Number>>,
}

/// The vessel of the cold bath.
#[derive(Debug, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub(crate) struct VesselKeys {
    /// Volume up to the level that covers the part.
    #[schemars(required)]
    pub(crate) volume: Option<Written<Volume>>,
    /// What it loses in an hour at rest. Silent: a twentieth of its volume.
    pub(crate) hourly_loss: Option<Written<Volume>>,
}
