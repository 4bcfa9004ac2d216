//! The ways to join hot or cold: heat the hub, chill the shaft, or share between a bath and an oven.

use std::fmt;

use super::error::AssemblyError;
use super::thermal::{clearance, hub_temperature_for, shaft_temperature_for, shrinkage};
use crate::material::Expansion;

/// Two parts that are to be joined hot or cold.
#[derive(Debug, Clone, Copy)]
pub struct Joining<'a> {
    /// Diameter of the bore at 20 °C, m.
    pub diameter: f64,
    /// Diametral interference at 20 °C without smoothing, m; the tightest pair decides.
    pub interference: f64,
    /// Diametral clearance wanted while joining, m.
    pub clearance: f64,
    /// Expansion of the hub.
    pub hub: &'a Expansion,
    /// Expansion of the shaft.
    pub shaft: &'a Expansion,
    /// Temperature of the shop, K.
    pub shop_temperature: f64,
    /// Highest temperature allowed for the hub, K.
    pub hub_limit: Option<f64>,
}

/// A temperature that one part must reach, or why it cannot.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Route {
    /// Temperature the part must reach, K; none when its curve ends before.
    pub temperature: Option<f64>,
    /// What stands in the way; none when the route is open.
    pub obstacle: Option<Obstacle>,
}

impl Route {
    /// Whether the part can be brought to the temperature.
    pub fn possible(&self) -> bool {
        self.obstacle.is_none()
    }
}

/// Why a part cannot be brought to the temperature it would need.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Obstacle {
    /// Its expansion curve ends before the clearance opens.
    CurveEnds {
        /// End of the curve, K.
        end: f64,
        /// Diametral clearance there, m; negative while the parts still interfere.
        clearance: f64,
        /// Diametral clearance wanted, m.
        wanted: f64,
    },
    /// The part must not become that hot.
    AboveLimit {
        /// Temperature needed, K.
        needed: f64,
        /// Highest temperature allowed, K.
        limit: f64,
    },
}

impl fmt::Display for Obstacle {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::CurveEnds { end, clearance, wanted } => write!(
                f,
                "the expansion curve ends at {:.1} °C, where the clearance is {:.1} µm and {:.1} µm is wanted",
                end - 273.15,
                clearance * 1e6,
                wanted * 1e6
            ),
            Self::AboveLimit { needed, limit } => write!(
                f,
                "{:.1} °C is needed, but the part must not be hotter than {:.1} °C",
                needed - 273.15,
                limit - 273.15
            ),
        }
    }
}

/// What a cold bath achieves against what is needed, and what the hub must do besides.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct BathRoute {
    /// Temperature of the bath, K.
    pub temperature: f64,
    /// Change of diameter needed between the parts at shop temperature: interference there plus clearance, m.
    pub needed: f64,
    /// Diametral shrinkage of the shaft from shop to bath temperature, m; none when its curve ends before.
    pub shrinkage: Option<f64>,
    /// Why the shrinkage is not known; none when it is.
    pub obstacle: Option<Obstacle>,
    /// Whether the bath alone opens the clearance.
    pub alone: bool,
    /// Hub temperature needed besides the bath: shop temperature when the bath alone will do.
    pub hub: Option<Route>,
}

impl Joining<'_> {
    /// Change of diameter needed at shop temperature, m: what the parts interfere there plus the clearance.
    ///
    /// # Errors
    /// As [`clearance`].
    pub fn needed(&self) -> Result<f64, AssemblyError> {
        Ok(self.clearance - self.clearance_at(self.shop_temperature, self.shop_temperature)?)
    }

    /// Diametral clearance with hub and shaft at these temperatures (K), m.
    ///
    /// # Errors
    /// As [`clearance`].
    pub fn clearance_at(&self, hub_temperature: f64, shaft_temperature: f64) -> Result<f64, AssemblyError> {
        clearance(self.diameter, self.interference, self.hub, hub_temperature, self.shaft, shaft_temperature)
    }

    /// Hub temperature needed with the shaft at `shaft_temperature` (K); shop temperature when it already clears.
    ///
    /// # Errors
    /// As [`clearance`]; a curve that ends or a limit that is passed is an answer, not an error.
    pub fn heat_hub(&self, shaft_temperature: f64) -> Result<Route, AssemblyError> {
        if self.clearance_at(self.shop_temperature, shaft_temperature)? >= self.clearance {
            return Ok(Route { temperature: Some(self.shop_temperature), obstacle: None });
        }
        let found = hub_temperature_for(
            self.diameter,
            self.interference,
            self.clearance,
            self.hub,
            self.shaft,
            shaft_temperature,
        );
        let mut route = as_route(found)?;
        if let (Some(needed), Some(limit)) = (route.temperature, self.hub_limit)
            && needed > limit
        {
            route.obstacle = Some(Obstacle::AboveLimit { needed, limit });
        }
        Ok(route)
    }

    /// Shaft temperature needed with the hub at shop temperature; shop temperature when it already clears.
    ///
    /// # Errors
    /// As [`Joining::heat_hub`].
    pub fn chill_shaft(&self) -> Result<Route, AssemblyError> {
        if self.clearance_at(self.shop_temperature, self.shop_temperature)? >= self.clearance {
            return Ok(Route { temperature: Some(self.shop_temperature), obstacle: None });
        }
        as_route(shaft_temperature_for(
            self.diameter,
            self.interference,
            self.clearance,
            self.hub,
            self.shop_temperature,
            self.shaft,
        ))
    }

    /// What a bath at `bath_temperature` (K) achieves and what hub temperature is needed besides.
    ///
    /// # Errors
    /// As [`Joining::heat_hub`].
    ///
    /// # Example
    /// ```
    /// use hubgrip::assembly::joining::Joining;
    /// use hubgrip::material::Expansion;
    /// let hub = Expansion::from_mean(12e-6, 273.15, 573.15, "mean of 20 to 300 °C").unwrap();
    /// let shaft = Expansion::from_mean(10.9e-6, 194.65, 293.15, "mean of 20 to −78 °C").unwrap();
    /// let joining = Joining {
    ///     diameter: 0.1,
    ///     interference: 100e-6,
    ///     clearance: 50e-6,
    ///     hub: &hub,
    ///     shaft: &shaft,
    ///     shop_temperature: 293.15,
    ///     hub_limit: None,
    /// };
    /// let bath = joining.bath(hubgrip::assembly::thermal::DRY_ICE_TEMPERATURE).unwrap();
    /// assert!(!bath.alone && bath.shrinkage.unwrap() < bath.needed);
    /// assert!(bath.hub.unwrap().temperature.unwrap() < 340.0);
    /// ```
    pub fn bath(&self, bath_temperature: f64) -> Result<BathRoute, AssemblyError> {
        let needed = self.needed()?;
        let (low, high) = self.shaft.range();
        if !(low..=high).contains(&bath_temperature) {
            let end = if bath_temperature < low { low } else { high };
            let obstacle = Obstacle::CurveEnds {
                end,
                clearance: self.clearance_at(self.shop_temperature, end)?,
                wanted: self.clearance,
            };
            return Ok(BathRoute {
                temperature: bath_temperature,
                needed,
                shrinkage: None,
                obstacle: Some(obstacle),
                alone: false,
                hub: None,
            });
        }
        let shaft_diameter = self.diameter + self.interference;
        let achieved = shrinkage(shaft_diameter, self.shaft, self.shop_temperature, bath_temperature)?;
        Ok(BathRoute {
            temperature: bath_temperature,
            needed,
            shrinkage: Some(achieved),
            obstacle: None,
            alone: self.clearance_at(self.shop_temperature, bath_temperature)? >= self.clearance,
            hub: Some(self.heat_hub(bath_temperature)?),
        })
    }
}

fn as_route(found: Result<f64, AssemblyError>) -> Result<Route, AssemblyError> {
    match found {
        Ok(temperature) => Ok(Route { temperature: Some(temperature), obstacle: None }),
        Err(AssemblyError::CurveEnds { end, clearance, wanted, .. }) => {
            let obstacle = Obstacle::CurveEnds { end, clearance, wanted };
            Ok(Route { temperature: None, obstacle: Some(obstacle) })
        }
        Err(error) => Err(error),
    }
}

#[cfg(test)]
mod tests {
    use super::super::thermal::{DRY_ICE_TEMPERATURE, LIQUID_NITROGEN_TEMPERATURE};
    use super::*;
    use crate::material::REFERENCE_TEMPERATURE as SHOP;
    use approx::assert_relative_eq;

    fn mean(coefficient: f64) -> Expansion {
        Expansion::from_mean(coefficient, 77.0, 800.0, "test").unwrap()
    }

    #[test]
    fn routes_carry_their_obstacles() {
        let (hub, shaft) = (mean(12e-6), mean(8.5e-6));
        let joining = Joining {
            diameter: 0.1,
            interference: 100e-6,
            clearance: 50e-6,
            hub: &hub,
            shaft: &shaft,
            shop_temperature: SHOP,
            hub_limit: Some(400.0),
        };
        let heated = joining.heat_hub(SHOP).unwrap();
        assert!(!heated.possible());
        assert_eq!(heated.obstacle.unwrap().to_string().split(" °C").next(), Some("145.0"));
        assert_relative_eq!(joining.needed().unwrap(), 150e-6, max_relative = 1e-12);

        let nitrogen = joining.bath(LIQUID_NITROGEN_TEMPERATURE).unwrap();
        let expected = 0.1001 * 8.5e-6 * (SHOP - LIQUID_NITROGEN_TEMPERATURE);
        assert_relative_eq!(nitrogen.shrinkage.unwrap(), expected, max_relative = 1e-12);
        assert!(nitrogen.alone);
        assert_eq!(nitrogen.hub.unwrap().temperature, Some(SHOP));

        let ice = joining.bath(DRY_ICE_TEMPERATURE).unwrap();
        assert!(!ice.alone && ice.hub.unwrap().possible());
        let hub_temperature = ice.hub.unwrap().temperature.unwrap();
        let reached = joining.clearance_at(hub_temperature, DRY_ICE_TEMPERATURE).unwrap();
        assert_relative_eq!(reached, 50e-6, max_relative = 1e-10);

        let beyond = joining.bath(20.0).unwrap();
        assert!(beyond.shrinkage.is_none() && beyond.hub.is_none());
        assert!(matches!(beyond.obstacle, Some(Obstacle::CurveEnds { end: 77.0, .. })));
    }

    #[test]
    fn parts_that_already_clear_need_no_heat() {
        let steel = mean(12e-6);
        let joining = Joining {
            diameter: 0.1,
            interference: -80e-6,
            clearance: 50e-6,
            hub: &steel,
            shaft: &steel,
            shop_temperature: 288.15,
            hub_limit: None,
        };
        assert_eq!(joining.heat_hub(288.15).unwrap().temperature, Some(288.15));
        assert_eq!(joining.chill_shaft().unwrap().temperature, Some(288.15));
    }
}
