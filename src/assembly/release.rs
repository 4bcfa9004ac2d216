//! Taking a joint apart by heating the hub: how far the shaft may lag behind, and when the hub lets go.

use super::error::{AssemblyError, finite, require};
use super::handling::{HandledPart, Handling, HandlingPoint};
use super::integrator::{Integration, State};
use super::joining::Joining;
use super::pair::Gap;
use crate::numerics::root::bracketed;

/// Hub temperature (K) at which the joint lets go with the clearance of `joining`, when the shaft warms by `share`
/// of what the hub warms.
///
/// Solves c(T_h, T_s) = c_wanted with T_s = T_shop + share (T_h − T_shop). A share of 0 is a shaft that stays cold, 1 a
/// joint that is warmed through; then a hub of one material with its shaft never lets go.
///
/// Source: [`crate::assembly::thermal::clearance`].
///
/// # Errors
/// [`AssemblyError::OutsideRange`] for a share outside 0 … 1; [`AssemblyError::CurveEnds`] when the expansion curves
/// end before the joint lets go.
///
/// # Example
/// ```
/// use hubgrip::assembly::joining::Joining;
/// use hubgrip::assembly::release::release_temperature;
/// use hubgrip::material::Expansion;
/// let steel = Expansion::from_mean(12e-6, 273.15, 873.15, "mean of 20 to 300 °C").unwrap();
/// let joining = Joining {
///     diameter: 0.1,
///     interference: 100e-6,
///     clearance: 20e-6,
///     hub: &steel,
///     shaft: &steel,
///     shop_temperature: 293.15,
///     hub_limit: None,
/// };
/// let cold_shaft = release_temperature(&joining, 0.0).unwrap();
/// assert!((cold_shaft - 393.15).abs() < 1e-9);
/// assert!(release_temperature(&joining, 0.5).unwrap() > cold_shaft);
/// assert!(release_temperature(&joining, 1.0).is_err());
/// ```
pub fn release_temperature(joining: &Joining, share: f64) -> Result<f64, AssemblyError> {
    require((0.0..=1.0).contains(&share), "share of the shaft in the warming", share, "between 0 and 1")?;
    let shop = joining.shop_temperature;
    let shaft_at = |hub: f64| shop + share * (hub - shop);
    let lacking = |hub: f64| joining.clearance_at(hub, shaft_at(hub)).map(|c| c - joining.clearance);
    let mut end = joining.hub.range().1;
    if share > 0.0 {
        end = end.min(shop + (joining.shaft.range().1 - shop) / share);
    }
    // The difference of two curves may rise and fall: look along the way, then close in.
    const PIECES: u32 = 200;
    let at = |piece: u32| shop + (end - shop) * f64::from(piece) / f64::from(PIECES);
    let mut before = lacking(shop)?;
    if before >= 0.0 {
        return Ok(shop);
    }
    for piece in 1..=PIECES {
        let temperature = at(piece).min(end);
        let here = lacking(temperature)?;
        if here >= 0.0 {
            return Ok(bracketed(|t| lacking(t).unwrap_or(f64::NAN), at(piece - 1), temperature, 0.0)?);
        }
        before = here;
    }
    let wanted = joining.clearance;
    Err(AssemblyError::CurveEnds { part: "hub", end, clearance: before + wanted, wanted })
}

/// A joint whose hub is heated from outside so that it lets go of the shaft.
///
/// # Example
/// A steel hub heated fast and hard lets go before its shaft is warm:
/// ```
/// use hubgrip::assembly::conduction::Substance;
/// use hubgrip::assembly::film::Film;
/// use hubgrip::assembly::handling::HandledPart;
/// use hubgrip::assembly::release::ReleaseHeating;
/// use hubgrip::material::Expansion;
/// let shaft = HandledPart {
///     inner_diameter: 0.0,
///     outer_diameter: 0.1,
///     substance: Substance::constant(50.0, 7800.0, 500.0).unwrap(),
///     expansion: Expansion::from_mean(12e-6, 250.0, 900.0, "mean of 20 to 400 °C").unwrap(),
///     temperature: 293.15,
///     bore: Film::Insulated,
///     rim: Film::Insulated,
///     ends: Film::Insulated,
/// };
/// let hub = HandledPart {
///     inner_diameter: 0.1,
///     outer_diameter: 0.18,
///     rim: Film::Constant(2000.0),
///     ..shaft.clone()
/// };
/// let joint = ReleaseHeating {
///     hub,
///     shaft,
///     length: 0.1,
///     interference: 50e-6,
///     medium_temperature: 673.15,
/// };
/// let course = joint.course(0.0).unwrap();
/// assert!(course.released.unwrap() < 60.0);
/// ```
#[derive(Debug, Clone, PartialEq)]
pub struct ReleaseHeating {
    /// The hub at its temperature before heating; its rim and end films exchange heat with the medium.
    pub hub: HandledPart,
    /// The shaft under it; its bore and end films see the medium too: insulated as a rule.
    pub shaft: HandledPart,
    /// Length of the hub, m.
    pub length: f64,
    /// Diametral interference at 20 °C, m; without smoothing on the safe side.
    pub interference: f64,
    /// Temperature of what heats the hub, K.
    pub medium_temperature: f64,
}

/// How a heated joint opens.
#[derive(Debug, Clone, PartialEq)]
pub struct ReleaseCourse {
    /// Points in order of time; the clearance is that of the parts as if free, negative while they grip.
    pub points: Vec<HandlingPoint>,
    /// Time at which the wanted clearance is there, s; none when the shaft catches up first.
    pub released: Option<f64>,
    /// Greatest clearance reached on the way, m, and when, s.
    pub greatest_clearance: (f64, f64),
}

/// Rings of each part and allowed error of a step as a share of the temperature difference.
const RINGS: usize = 48;
const TOLERANCE: f64 = 1e-7;

impl ReleaseHeating {
    /// Clearance against time until `wanted` (m, diametral) is reached, or until nothing changes any more.
    ///
    /// Heat passes from hub to shaft as if there were no resistance between them, which is on the safe side: a real
    /// seat holds some of it back, the more the looser it gets. The temperatures are those of one mesh, to about
    /// 1e-3 of the time.
    ///
    /// Source: S. P. Timoshenko and J. N. Goodier, *Theory of Elasticity*, chapter 13 (free rings follow their area
    /// means).
    ///
    /// # Errors
    /// As [`Handling::course`].
    pub fn course(&self, wanted: f64) -> Result<ReleaseCourse, AssemblyError> {
        finite("clearance wanted (m)", wanted)?;
        let joint = Handling {
            hub: self.hub.clone(),
            shaft: self.shaft.clone(),
            length: self.length,
            interference: self.interference,
            air_temperature: self.medium_temperature,
            gas_conductivity: 1.0,
            overlap_after: 0.0,
        };
        joint.check()?;
        let pair = joint.pair(Some(Gap::Contact), RINGS);
        let temperatures = pair.uniform(self.shaft.temperature, self.hub.temperature);
        let state = State { time: 0.0, temperatures, exchanged: 0.0 };
        let scale = (self.medium_temperature - self.hub.temperature).abs().max(1.0);
        let mut run = Integration::new(&pair, state, 1e-4, TOLERANCE * scale);
        let mut points = Vec::new();
        let mut greatest_clearance = (f64::NEG_INFINITY, 0.0);
        let released = run.run_until(
            |state| wanted - pair.clearance(&state.temperatures),
            joint.longest(),
            |state| {
                let clearance = pair.clearance(&state.temperatures);
                if clearance > greatest_clearance.0 {
                    greatest_clearance = (clearance, state.time);
                }
                let (shaft_temperature, hub_temperature) = pair.means(&state.temperatures);
                points.push(HandlingPoint {
                    time: state.time,
                    clearance,
                    hub_temperature,
                    shaft_temperature,
                });
            },
        )?;
        Ok(ReleaseCourse { points, released, greatest_clearance })
    }
}

#[cfg(test)]
mod tests {
    use super::super::conduction::Substance;
    use super::super::film::Film;
    use super::*;
    use crate::material::Expansion;
    use approx::assert_relative_eq;

    fn joint(film: f64, hub_expansion: f64) -> ReleaseHeating {
        let part = |inner_diameter, outer_diameter, coefficient, rim| HandledPart {
            inner_diameter,
            outer_diameter,
            substance: Substance::constant(50.0, 7800.0, 500.0).unwrap(),
            expansion: Expansion::from_mean(coefficient, 250.0, 900.0, "test").unwrap(),
            temperature: 293.15,
            bore: Film::Insulated,
            rim,
            ends: Film::Insulated,
        };
        ReleaseHeating {
            hub: part(0.05, 0.1, hub_expansion, Film::Constant(film)),
            shaft: part(0.0, 0.05, 12e-6, Film::Insulated),
            length: 0.05,
            interference: 50e-6,
            medium_temperature: 493.15,
        }
    }

    /// Hub of 23e-6 on a shaft of 12e-6 /K, d 50 mm, U 50 µm, both warmed slowly: ΔT = U/(d (α_h − α_s)) = 90.909 K;
    /// with the shaft diameter d + U exactly 91.009 K.
    #[test]
    fn slow_heating_releases_at_the_loosening_temperature() {
        let course = joint(0.5, 23e-6).course(0.0).unwrap();
        assert!(course.released.is_some());
        let last = course.points.last().unwrap();
        let exact = 50e-6 / (0.05 * 23e-6 - 0.05005 * 12e-6);
        assert_relative_eq!(exact, 91.009, max_relative = 1e-5);
        assert_relative_eq!(last.hub_temperature - 293.15, exact, max_relative = 2e-3);
        assert_relative_eq!(last.hub_temperature, last.shaft_temperature, max_relative = 2e-3);
    }

    #[test]
    fn one_material_lets_go_only_when_heated_fast() {
        let slow = joint(5.0, 12e-6).course(0.0).unwrap();
        assert_eq!(slow.released, None);
        assert!(slow.greatest_clearance.0 < -45e-6);
        let hot = ReleaseHeating { medium_temperature: 793.15, ..joint(5000.0, 12e-6) };
        assert!(hot.course(0.0).unwrap().released.is_some());
        // It closes again as the shaft catches up: the end of a course that asks for too much.
        let too_much = hot.course(500e-6).unwrap();
        assert_eq!(too_much.released, None);
        assert!(too_much.greatest_clearance.0 > 0.0);
        assert!(too_much.points.last().unwrap().clearance < -49e-6);
    }

    #[test]
    fn release_temperature_by_share() {
        let (hub, shaft) = (
            Expansion::from_mean(23e-6, 250.0, 700.0, "test").unwrap(),
            Expansion::from_mean(12e-6, 250.0, 700.0, "test").unwrap(),
        );
        let joining = Joining {
            diameter: 0.05,
            interference: 50e-6,
            clearance: 0.0,
            hub: &hub,
            shaft: &shaft,
            shop_temperature: 293.15,
            hub_limit: None,
        };
        let through = release_temperature(&joining, 1.0).unwrap();
        assert_relative_eq!(through - 293.15, 91.009, max_relative = 1e-5);
        // Shaft at half the rise: U/(D α_h − (D + U) α_s/2).
        let half = release_temperature(&joining, 0.5).unwrap();
        assert_relative_eq!(half - 293.15, 50e-6 / (0.05 * 23e-6 - 0.05005 * 6e-6), max_relative = 1e-10);
        assert!(release_temperature(&joining, 1.5).is_err());
    }
}
