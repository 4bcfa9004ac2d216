//! What the seat does to a bearing: loss of clearance, what is left cold and hot, how it is mounted.

use super::condition::youngs_modulus;
use super::{AssemblyFindings, Caution, DutyFindings, Findings, FindingsError, PairFindings};
use crate::assembly::bearing::{mounted_clearance, raceway_change};
use crate::assembly::bearing_tables::{BearingRing, radial_clearance};
use crate::joint::{BearingSeat, DutyState, Joint, Method};
use crate::material::{Range, Sourced};
use crate::quantity::{Measure, show};
use crate::tolerance::Extremes;

/// Hoop stress that a through-hardened ring should not exceed, Pa.
///
/// Source: bearing handbooks, 120 to 130 MPa for the mounted inner ring of through-hardened steel, more for
/// case-hardened ones (from memory).
pub const HOOP_LIMIT: f64 = 130e6;

/// Where [`HOOP_LIMIT`] comes from.
pub const RING_LIMIT_SOURCE: &str =
    "bearing handbooks, 120 to 130 MPa for through-hardened rings (from memory)";

/// Usual limit for sealed or greased bearings, K: 80 °C (common practice, from memory).
const SEALED_LIMIT: f64 = 353.15;

/// What the seat does to a bearing; lengths m, stresses Pa, forces N, temperatures K.
#[derive(Debug, Clone, PartialEq)]
pub struct BearingFindings {
    /// Loss of radial internal clearance by the fit of the ring.
    pub loss: Extremes<f64>,
    /// Radial internal clearance before mounting, with its source.
    pub before: Sourced<Range>,
    /// What is left after mounting, at the shop temperature; negative is preload.
    pub mounted: Range,
    /// What is left in each service state.
    pub states: Vec<BearingState>,
    /// Hoop stress of greatest size in the ring: tension in an inner ring, compression in an outer one.
    pub hoop_stress: Extremes<f64>,
    /// Greatest force while pressing it on, tightest pair and high friction.
    pub mounting_force: f64,
    /// Force at first movement when it is pulled off, tightest pair and high friction.
    pub pull_off_force: f64,
    /// Temperature of the heated part that clears the tightest pair; none when no temperature does.
    pub mounting_temperature: Option<f64>,
    /// Whether that is within the limit.
    pub mounting_possible: bool,
}

/// The clearance in a service state.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct BearingState {
    /// How much warmer the inner ring is than the outer, K.
    pub inner_hotter_by: f64,
    /// Mean expansion coefficient of the fitted ring between both temperatures, 1/K; zero when they are equal.
    pub expansion: f64,
    /// Loss of clearance by the fit, loosest and tightest pair.
    pub loss: Range,
    /// What is left; negative is preload.
    pub left: Range,
}

/// What the seat does to the bearing of a joint, when it has one.
pub(super) fn bearing(
    joint: &Joint,
    extremes: &Extremes<PairFindings>,
    duty: &[DutyFindings],
    assembly: &AssemblyFindings,
) -> Result<Option<BearingFindings>, FindingsError> {
    let Some(seat) = &joint.bearing else { return Ok(None) };
    let work = Work { joint, seat };
    let before = radial_clearance(seat.kind, seat.clearance, seat.bore)?;
    let ring = joint.rings.get(seat.index());
    let modulus = ring.map_or(Ok(0.0), |ring| youngs_modulus(ring, joint.assembly.shop_temperature))?;
    let loss = Extremes {
        loosest: work.loss(extremes.loosest.pressure, modulus)?,
        mean: work.loss(extremes.mean.pressure, modulus)?,
        tightest: work.loss(extremes.tightest.pressure, modulus)?,
    };
    let states = joint
        .duty
        .iter()
        .zip(duty)
        .map(|(state, found)| work.state(state, found, before.value))
        .collect::<Result<_, _>>()?;
    Ok(Some(BearingFindings {
        mounted: work.left(before.value, Range { low: loss.loosest, high: loss.tightest }, 0.0, 0.0)?,
        loss,
        before,
        states,
        hoop_stress: extremes.as_ref().map(|pair| work.hoop(pair)),
        mounting_force: assembly.press.tightest.peak_force,
        pull_off_force: extremes.tightest.release_force.high,
        mounting_temperature: assembly.heat_hub.temperature,
        mounting_possible: assembly.heat_hub.possible,
    }))
}

struct Work<'a> {
    joint: &'a Joint,
    seat: &'a BearingSeat,
}

impl Work<'_> {
    fn loss(&self, pressure: f64, youngs_modulus: f64) -> Result<f64, FindingsError> {
        Ok(raceway_change(pressure, self.seat.diameter(), self.seat.raceway(), youngs_modulus)?)
    }

    /// Clearance left: the least of the group with the greatest loss, and the other way about.
    fn left(&self, before: Range, loss: Range, expansion: f64, hotter: f64) -> Result<Range, FindingsError> {
        let mean = 0.5 * (self.seat.inner_raceway + self.seat.outer_raceway);
        let of = |unmounted, loss| mounted_clearance(unmounted, loss, 0.0, expansion, hotter, mean);
        Ok(Range { low: of(before.low, loss.high)?, high: of(before.high, loss.low)? })
    }

    fn state(
        &self,
        state: &DutyState,
        found: &DutyFindings,
        before: Range,
    ) -> Result<BearingState, FindingsError> {
        let index = self.seat.index();
        let shop = self.joint.assembly.shop_temperature;
        let ring = state.temperatures.get(index).copied().unwrap_or(shop);
        let hotter = if ring > shop { self.seat.inner_hotter_by.value } else { 0.0 };
        let modulus = found.youngs_moduli.get(index).copied().unwrap_or(0.0);
        let loss = Range {
            low: self.loss(found.loosest.pressure, modulus)?,
            high: self.loss(found.tightest.pressure, modulus)?,
        };
        let expansion = self.expansion(ring, hotter)?;
        Ok(BearingState {
            inner_hotter_by: hotter,
            expansion,
            loss,
            left: self.left(before, loss, expansion, hotter)?,
        })
    }

    /// Mean expansion coefficient of the ring between its temperature and that of the other ring, 1/K.
    fn expansion(&self, ring: f64, hotter: f64) -> Result<f64, FindingsError> {
        let other = match self.seat.ring {
            BearingRing::Inner => ring - hotter,
            BearingRing::Outer => ring + hotter,
        };
        let Some(part) = self.joint.rings.get(self.seat.index()).filter(|_| other != ring) else {
            return Ok(0.0);
        };
        let strain = |temperature| {
            part.material
                .expansion
                .strain(temperature)
                .map_err(|cause| FindingsError::Expansion { material: part.material.name.clone(), cause })
        };
        Ok(((strain(ring)? - strain(other)?) / (ring - other)).max(0.0))
    }

    fn hoop(&self, pair: &PairFindings) -> f64 {
        pair.rings.get(self.seat.index()).map_or(0.0, |ring| ring.bore.hoop)
    }
}

/// Cautions of a bearing seat.
pub(super) fn cautions(findings: &Findings) -> Vec<Caution> {
    let (Some(bearing), Some(seat)) = (&findings.bearing, &findings.joint.bearing) else { return Vec::new() };
    let system = findings.joint.display;
    let mut all = Vec::new();
    let mut say = |subject, text: String, source: &str| {
        all.push(Caution::found(subject, text, source));
    };
    let hoop = bearing.hoop_stress.tightest;
    if seat.ring == BearingRing::Inner && hoop > HOOP_LIMIT {
        say(
            "strength",
            format!(
                "The inner ring is stretched with {} at the tightest pair; a through-hardened ring may crack in service above \
                 about {}. Choose a looser fit or a case-hardened ring.",
                show(Measure::Pressure, hoop, system),
                show(Measure::Pressure, HOOP_LIMIT, system),
            ),
            RING_LIMIT_SOURCE,
        );
    }
    let hot = findings
        .joint
        .duty
        .iter()
        .zip(&bearing.states)
        .map(|(state, left)| (state.name.as_str(), left.left.low));
    let tight: Vec<String> = std::iter::once(("after mounting", bearing.mounted.low))
        .chain(hot)
        .filter(|(_, low)| *low <= 0.0)
        .map(|(when, low)| format!("{when} ({})", show(Measure::Deviation, low, system)))
        .collect();
    if !tight.is_empty() {
        say(
            "strength",
            format!(
                "The bearing may run without clearance or preloaded: {}. Take a looser fit or a greater clearance group.",
                tight.join(", ")
            ),
            "T. A. Harris and M. N. Kotzalas, Essential Concepts of Bearing Technology: loss of clearance by fit and temperature",
        );
    }
    if bearing.before.source.contains("from memory") {
        say(
            "input",
            format!(
                "The clearance group rests on memory ({}): look it up in the maker's catalogue.",
                bearing.before.source
            ),
            "state of the table built in",
        );
    }
    say(
        "strength",
        "The other ring is taken to sit loose: what its own fit takes comes off the clearance as well."
            .to_owned(),
        "scope of this calculation",
    );
    let heats = matches!(findings.joint.assembly.method, Method::HeatHub | Method::HeatAndChill);
    if seat.ring == BearingRing::Inner
        && heats
        && bearing.mounting_temperature.is_some_and(|hot| hot > SEALED_LIMIT)
    {
        say(
            "heat",
            format!(
                "A sealed or greased bearing stands about {} only: heat it no further unless its maker allows more.",
                show(Measure::Temperature, SEALED_LIMIT, system)
            ),
            "common practice, from memory",
        );
    }
    all
}
