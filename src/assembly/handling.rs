//! The time there is: clearance against seconds from the oven or the bath until the parts touch.

use super::air::air_conductivity;
use super::conduction::{Body, Substance};
use super::error::{AssemblyError, finite, not_negative, positive, require};
use super::film::{Film, Standing};
use super::integrator::{Integration, State};
use super::pair::{Gap, Pair, PairPart};
use crate::material::Expansion;

/// Conductivity of the air in the gap between two parts, W/(m·K), from the mean of their temperatures (K).
///
/// The mean is taken as the parts leave oven or bath: what one gives the other takes, so that it changes little. Source and
/// range as in [`air_conductivity`].
///
/// # Example
/// ```
/// use hubgrip::assembly::handling::gap_air_conductivity;
/// assert!((gap_air_conductivity(293.15, 77.36) - 0.0169).abs() < 1e-4);
/// ```
pub fn gap_air_conductivity(hub_temperature: f64, shaft_temperature: f64) -> f64 {
    air_conductivity(0.5 * (hub_temperature + shaft_temperature))
}

/// Emissivity taken for a hot hub, 0.8: oxidised steel (usual textbook figure); bright parts radiate less and
/// cool more slowly.
pub const HUB_EMISSIVITY: f64 = 0.8;

/// One of the two parts as it leaves the oven, the bath or the bench.
#[derive(Debug, Clone, PartialEq)]
pub struct HandledPart {
    /// Inner diameter, m; zero for a solid shaft.
    pub inner_diameter: f64,
    /// Outer diameter, m.
    pub outer_diameter: f64,
    /// Thermal properties.
    pub substance: Substance,
    /// Expansion from 20 °C; must cover every temperature that occurs.
    pub expansion: Expansion,
    /// Temperature at the start, K, the same throughout.
    pub temperature: f64,
    /// Exchange with the air at the bore; for the hub until the parts overlap.
    pub bore: Film,
    /// Exchange with the air at the rim; for the shaft until the parts overlap.
    pub rim: Film,
    /// Exchange with the air at the two end faces over the length of the hub; insulated for a long shaft.
    pub ends: Film,
}

/// A hub and the piece of shaft it goes over, from leaving the oven or bath until they touch.
///
/// # Example
/// ```
/// use hubgrip::assembly::conduction::Substance;
/// use hubgrip::assembly::film::Film;
/// use hubgrip::assembly::handling::{HandledPart, Handling};
/// use hubgrip::material::Expansion;
/// let steel = Substance::constant(50.0, 7800.0, 500.0).unwrap();
/// let expansion = Expansion::from_mean(12e-6, 250.0, 600.0, "mean of 20 to 300 °C").unwrap();
/// let shaft = HandledPart {
///     inner_diameter: 0.0,
///     outer_diameter: 0.1,
///     substance: steel,
///     expansion,
///     temperature: 293.15,
///     bore: Film::Insulated,
///     rim: Film::Insulated,
///     ends: Film::Insulated,
/// };
/// let hub = HandledPart {
///     inner_diameter: 0.1,
///     outer_diameter: 0.2,
///     temperature: 473.15,
///     rim: Film::Constant(10.0),
///     ..shaft.clone()
/// };
/// let handling = Handling {
///     hub,
///     shaft,
///     length: 0.1,
///     interference: 100e-6,
///     air_temperature: 293.15,
///     gas_conductivity: 0.03,
///     overlap_after: 0.0,
/// };
/// let course = handling.course(0.0).unwrap();
/// assert!((course.gone.unwrap() - 72.905).abs() < 0.01);
/// ```
#[derive(Debug, Clone, PartialEq)]
pub struct Handling {
    /// The hub; its inner diameter is the diameter of the joint.
    pub hub: HandledPart,
    /// The shaft; its outer diameter is that of the joint.
    pub shaft: HandledPart,
    /// Length of the hub, m.
    pub length: f64,
    /// Diametral interference at 20 °C without smoothing, m; the tightest pair decides.
    pub interference: f64,
    /// Temperature of the air, K.
    pub air_temperature: f64,
    /// Conductivity of the gas in the gap, W/(m·K).
    pub gas_conductivity: f64,
    /// Time from leaving the oven or bath until the parts overlap, s; they are then taken to overlap fully.
    pub overlap_after: f64,
}

/// State of the pair at one time.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct HandlingPoint {
    /// Time since leaving the oven or bath, s.
    pub time: f64,
    /// Diametral clearance, m; negative when the parts can no longer pass.
    pub clearance: f64,
    /// Area mean of the hub, K.
    pub hub_temperature: f64,
    /// Area mean of the shaft inside it, K.
    pub shaft_temperature: f64,
}

/// Course of the clearance.
#[derive(Debug, Clone, PartialEq)]
pub struct HandlingCourse {
    /// Points in order of time, from leaving the oven or bath to the end of the clearance.
    pub points: Vec<HandlingPoint>,
    /// Clearance when the parts begin to overlap, m.
    pub clearance_at_overlap: f64,
    /// Time from leaving the oven or bath until the clearance has fallen to the least one, s; none when it never does.
    pub gone: Option<f64>,
    /// The same if the parts never overlapped and cooled or warmed in air alone, s.
    pub gone_in_air: Option<f64>,
}

/// Mesh and step control of a course.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Accuracy {
    /// Rings of each part in the coarser of the two meshes, at least two.
    pub rings: usize,
    /// Allowed error of a step as a share of the greatest temperature difference.
    pub tolerance: f64,
}

impl Accuracy {
    /// Times to about 1e-5.
    pub const FINE: Self = Self { rings: 24, tolerance: 1e-7 };
    /// Times to about 1e-3, in a fortieth of the time.
    pub const QUICK: Self = Self { rings: 4, tolerance: 1e-4 };
}

/// Longest time that is followed, in multiples of the time constant in air.
const LONGEST: f64 = 40.0;

impl Handling {
    /// Clearance against time until it has fallen to `least` (m, diametral; zero for contact).
    ///
    /// Before they overlap the parts exchange heat with the air alone. From then on heat crosses the gap with
    /// h = k_gas/g, where g is half the clearance that follows from the area means of both parts at that time;
    /// the hub bore and the shaft under it no longer see the air. Radiation across the gap is left out: at a gap
    /// of 50 µm it is less than a fiftieth of conduction. The parts are taken as concentric, so that the real time is
    /// shorter where they touch on one side. Conduction along the shaft out of the hub is left out.
    ///
    /// Times are extrapolated from two meshes.
    ///
    /// Source: S. P. Timoshenko and J. N. Goodier, *Theory of Elasticity*, chapter 13 (bore and rim of a free ring
    /// follow the area mean); conduction through a thin gas layer.
    ///
    /// # Errors
    /// [`AssemblyError::OutsideRange`] for impossible numbers, [`AssemblyError::OutsideCurve`] or
    /// [`AssemblyError::Table`] when a curve does not cover the temperatures.
    pub fn course(&self, least: f64) -> Result<HandlingCourse, AssemblyError> {
        self.course_with(least, Accuracy::FINE)
    }

    /// As [`Handling::course`] with a mesh and a step control of your own.
    ///
    /// # Errors
    /// As [`Handling::course`].
    pub fn course_with(&self, least: f64, accuracy: Accuracy) -> Result<HandlingCourse, AssemblyError> {
        let (coarse, fine) = self.two_meshes(least, Some(self.overlap_after), accuracy)?;
        let (coarse_air, fine_air) = self.two_meshes(least, None, accuracy)?;
        Ok(HandlingCourse {
            clearance_at_overlap: fine.at_overlap,
            gone: extrapolated(coarse.gone, fine.gone),
            gone_in_air: extrapolated(coarse_air.gone, fine_air.gone),
            points: fine.points,
        })
    }

    /// Time in air alone until the clearance has fallen to `least` (m), s; none when it never does.
    ///
    /// # Errors
    /// As [`Handling::course`].
    pub fn time_in_air(&self, least: f64) -> Result<Option<f64>, AssemblyError> {
        let (coarse, fine) = self.two_meshes(least, None, Accuracy::FINE)?;
        Ok(extrapolated(coarse.gone, fine.gone))
    }

    /// The same course on a mesh and on one twice as fine.
    fn two_meshes(
        &self,
        least: f64,
        overlap: Option<f64>,
        accuracy: Accuracy,
    ) -> Result<(Run, Run), AssemblyError> {
        self.check()?;
        finite("least clearance (m)", least)?;
        let Accuracy { rings, tolerance } = accuracy;
        require(rings >= 2, "number of rings", rings as f64, "two or more")?;
        positive("allowed error of a step", tolerance)?;
        Ok((self.run(least, overlap, rings, tolerance)?, self.run(least, overlap, 2 * rings, tolerance)?))
    }

    pub(super) fn check(&self) -> Result<(), AssemblyError> {
        positive("length (m)", self.length)?;
        finite("interference (m)", self.interference)?;
        positive("air temperature (K)", self.air_temperature)?;
        positive("conductivity of the gas in the gap (W/(m·K))", self.gas_conductivity)?;
        not_negative("time until the parts overlap (s)", self.overlap_after)?;
        let joint = self.hub.inner_diameter;
        require(
            joint > 0.0 && (self.shaft.outer_diameter - joint).abs() <= 0.01 * joint,
            "outer diameter of the shaft (m)",
            self.shaft.outer_diameter,
            "the inner diameter of the hub within 1 %",
        )?;
        let all = [self.hub.temperature, self.shaft.temperature, self.air_temperature];
        let (coldest, hottest) =
            (all.iter().copied().fold(f64::INFINITY, f64::min), all.iter().copied().fold(0.0, f64::max));
        for (name, part) in [("hub", &self.hub), ("shaft", &self.shaft)] {
            positive("temperature (K)", part.temperature)?;
            self.body(part).check()?;
            part.substance.check(coldest, hottest)?;
            for film in [&part.bore, &part.rim, &part.ends] {
                film.check(coldest, hottest)?;
            }
            let (from, to) = part.expansion.range();
            for given in [coldest, hottest] {
                if !(from..=to).contains(&given) {
                    return Err(AssemblyError::OutsideCurve { part: name, from, to, given });
                }
            }
        }
        Ok(())
    }

    fn body(&self, part: &HandledPart) -> Body {
        Body { inner_diameter: part.inner_diameter, outer_diameter: part.outer_diameter, length: self.length }
    }

    fn pair_part<'a>(&self, part: &'a HandledPart) -> PairPart<'a> {
        PairPart {
            body: self.body(part),
            substance: &part.substance,
            expansion: &part.expansion,
            films: [&part.bore, &part.rim, &part.ends],
        }
    }

    pub(super) fn pair(&self, gap: Option<Gap>, rings: usize) -> Pair<'_> {
        Pair {
            shaft: self.pair_part(&self.shaft),
            hub: self.pair_part(&self.hub),
            diameter: self.hub.inner_diameter,
            interference: self.interference,
            air: self.air_temperature,
            gap,
            rings,
        }
    }

    /// One mesh: in air until `overlap` (for ever when none), then across the gap.
    fn run(
        &self,
        least: f64,
        overlap: Option<f64>,
        rings: usize,
        tolerance: f64,
    ) -> Result<Run, AssemblyError> {
        let apart = self.pair(None, rings);
        let temperatures = apart.uniform(self.shaft.temperature, self.hub.temperature);
        let mut state = State { time: 0.0, temperatures, exchanged: 0.0 };
        let mut points = Vec::new();
        let limit = self.longest();
        let mut gone = self.phase(
            &apart,
            &mut state,
            least,
            overlap.unwrap_or(limit).min(limit),
            tolerance,
            &mut points,
        )?;
        let at_overlap = apart.clearance(&state.temperatures);
        if gone.is_none() && overlap.is_some() {
            let joined = self.pair(Some(Gap::Gas(self.gas_conductivity)), rings);
            gone = self.phase(&joined, &mut state, least, limit, tolerance, &mut points)?;
        }
        Ok(Run { points, at_overlap, gone })
    }

    fn phase(
        &self,
        pair: &Pair<'_>,
        state: &mut State,
        least: f64,
        until: f64,
        tolerance: f64,
        points: &mut Vec<HandlingPoint>,
    ) -> Result<Option<f64>, AssemblyError> {
        let scale = [self.hub.temperature, self.shaft.temperature]
            .map(|t| (t - self.air_temperature).abs())
            .into_iter()
            .fold((self.hub.temperature - self.shaft.temperature).abs(), f64::max);
        let mut run = Integration::new(pair, state.clone(), 1e-4, tolerance * scale.max(1.0));
        let gone = run.run_until(
            |state| pair.clearance(&state.temperatures) - least,
            until,
            |state| {
                let (shaft_temperature, hub_temperature) = pair.means(&state.temperatures);
                points.push(HandlingPoint {
                    time: state.time,
                    clearance: pair.clearance(&state.temperatures),
                    hub_temperature,
                    shaft_temperature,
                });
            },
        )?;
        *state = run.state;
        points.dedup_by(|later, earlier| later.time == earlier.time);
        Ok(gone)
    }

    /// Time after which nothing changes any more, s: the heat of both parts at a tenth of a weak film, 2 W/(m²·K).
    pub(super) fn longest(&self) -> f64 {
        let least_film = 2.0;
        let constant = |part: &HandledPart| {
            let heat = part.substance.density * part.substance.specific_heat.value_held(part.temperature);
            heat * part.outer_diameter / (4.0 * least_film)
        };
        LONGEST * (constant(&self.hub) + constant(&self.shaft)) + self.overlap_after
    }
}

struct Run {
    points: Vec<HandlingPoint>,
    at_overlap: f64,
    gone: Option<f64>,
}

fn extrapolated(coarse: Option<f64>, fine: Option<f64>) -> Option<f64> {
    match (coarse, fine) {
        (Some(coarse), Some(fine)) => Some((fine + (fine - coarse) / 3.0).max(0.0)),
        _ => fine,
    }
}

/// Films of a part of `diameter` (m) and `length` (m) in the still air of the shop: bore, rim and end faces.
///
/// The part is taken with its axis upright, as a hub that is lowered over a shaft.
///
/// # Example
/// ```
/// use hubgrip::assembly::handling::{HUB_EMISSIVITY, still_air_films};
/// let [_, rim, _] = still_air_films(0.2, 0.1, HUB_EMISSIVITY);
/// let coefficient = rim.heat_flux(473.15, 293.15) / 180.0;
/// assert!((10.0..25.0).contains(&coefficient));
/// ```
pub fn still_air_films(diameter: f64, length: f64, emissivity: f64) -> [Film; 3] {
    let upright = Film::StillAir { standing: Standing::Vertical, size: length, emissivity };
    let flat = Film::StillAir { standing: Standing::HorizontalCylinder, size: diameter, emissivity };
    [upright.clone(), upright, flat]
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    fn pair() -> Handling {
        let part = |inner_diameter, outer_diameter, temperature| {
            let [bore, rim, ends] = still_air_films(outer_diameter, 0.1, HUB_EMISSIVITY);
            HandledPart {
                inner_diameter,
                outer_diameter,
                substance: Substance::constant(50.0, 7800.0, 500.0).unwrap(),
                expansion: Expansion::from_mean(12e-6, 77.0, 900.0, "test").unwrap(),
                temperature,
                bore,
                rim,
                ends,
            }
        };
        Handling {
            hub: part(0.1, 0.2, 473.15),
            shaft: part(0.0, 0.1, 293.15),
            length: 0.1,
            interference: 100e-6,
            air_temperature: 293.15,
            gas_conductivity: 0.030,
            overlap_after: 20.0,
        }
    }

    /// Half the rings and a coarser step change the time by less than 0.5 % (here by less than 0.01 %).
    #[test]
    fn mesh_and_step_do_not_matter() {
        let time =
            |rings, tolerance| pair().course_with(0.0, Accuracy { rings, tolerance }).unwrap().gone.unwrap();
        let Accuracy { rings, tolerance } = Accuracy::FINE;
        let fine = time(rings, tolerance);
        assert_relative_eq!(time(rings / 2, tolerance), fine, max_relative = 1e-4);
        assert_relative_eq!(time(rings, 100.0 * tolerance), fine, max_relative = 1e-4);
    }
}
