//! What is known of the oven, the bath, the room and the handling.

use crate::assembly::film::{Film, Standing};
use crate::assembly::handling::HUB_EMISSIVITY;
use crate::assembly::media::Medium;

/// What the hub is heated in.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Heating {
    /// Oven with moved air.
    ForcedOven,
    /// Oven with still air.
    StillOven,
    /// Bath of hot oil.
    OilBath,
    /// Induction heater: heat arises in the part itself.
    Induction,
}

impl Heating {
    /// The word of the joint file.
    pub fn name(self) -> &'static str {
        match self {
            Self::ForcedOven => "forced oven",
            Self::StillOven => "still oven",
            Self::OilBath => "oil bath",
            Self::Induction => "induction",
        }
    }

    /// Heat exchange of a part of `diameter` and `length` (m), with its source; none for induction.
    pub fn film(self, diameter: f64, length: f64) -> Option<(Film, &'static str)> {
        let usual = |medium: Medium| (medium.film(diameter), medium.usual().source);
        match self {
            Self::ForcedOven => Some(usual(Medium::Oven)),
            Self::StillOven => Some((
                Film::StillAir { standing: Standing::Vertical, size: length, emissivity: HUB_EMISSIVITY },
                "free convection of air with radiation, simplified equations (J. P. Holman, Heat Transfer, from memory)",
            )),
            Self::OilBath => Some(usual(Medium::OilBath)),
            Self::Induction => None,
        }
    }
}

/// The room in which a cold bath stands.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Room {
    /// Its volume, m³.
    pub volume: f64,
    /// Changes of its air in an hour; zero when it is not ventilated.
    pub air_changes: f64,
}

/// The vessel of a cold bath.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Vessel {
    /// Volume up to the level that covers the part, m³.
    pub volume: f64,
    /// Liquid or solid that is lost in an hour at rest, m³; none for the usual share.
    pub hourly_loss: Option<f64>,
}

/// What is known of the oven, the bath, the room and the handling.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Practice {
    /// What the hub is heated in.
    pub heating: Heating,
    /// What oven or oil is set to, K; none: so that 99 % of the rise is the temperature that clears.
    pub oven_temperature: Option<f64>,
    /// Form error of both seats together, diametral, m: added to the clearance, and the parts touch when no more
    /// than this is left.
    pub form_error: f64,
    /// Clearance added for handling, diametral, m.
    pub handling_allowance: f64,
    /// Time that is needed from oven or bath to seated, s.
    pub handling_time: Option<f64>,
    /// Time from oven or bath until the parts begin to overlap, s.
    pub transfer_time: f64,
    /// The room of the cold bath.
    pub room: Option<Room>,
    /// The vessel of the cold bath; none: a box twice the volume round the part.
    pub vessel: Option<Vessel>,
    /// Length of the shaft that is chilled, m; none: that of the hub.
    pub chilled_length: Option<f64>,
    /// Relative humidity of the room at the shop temperature, 0 to 1.
    pub humidity: f64,
    /// Share of the hub's rise by which the shaft lags behind when the joint is heated to be taken apart, 0 to 1.
    pub temperature_lag: f64,
}

impl Practice {
    /// Time that must be left from oven or bath, s: the one required, and at least the one after which the parts begin to
    /// overlap; none when neither is given.
    ///
    /// # Example
    /// ```
    /// use hubgrip::joint::practice::Practice;
    /// let practice = Practice { handling_time: Some(10.0), transfer_time: 25.0, ..Practice::default() };
    /// assert_eq!(practice.time_needed(), Some(25.0));
    /// assert_eq!(Practice::default().time_needed(), None);
    /// ```
    pub fn time_needed(&self) -> Option<f64> {
        let transfer = (self.transfer_time > 0.0).then_some(self.transfer_time);
        self.handling_time.into_iter().chain(transfer).reduce(f64::max)
    }
}

/// Share by which the shaft lags behind when the file is silent.
pub const TEMPERATURE_LAG: f64 = 0.5;

/// Relative humidity of the room when the file is silent.
pub const HUMIDITY: f64 = 0.5;

impl Default for Practice {
    /// What is taken when the joint file is silent.
    fn default() -> Self {
        Self {
            heating: Heating::ForcedOven,
            oven_temperature: None,
            form_error: 0.0,
            handling_allowance: 0.0,
            handling_time: None,
            transfer_time: 0.0,
            room: None,
            vessel: None,
            chilled_length: None,
            humidity: HUMIDITY,
            temperature_lag: TEMPERATURE_LAG,
        }
    }
}
