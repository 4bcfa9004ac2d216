//! What one row gives, and the columns in which it is written.

use std::borrow::Cow;

use crate::findings::{Findings, Question, RingStress, Verdict};
use crate::joint::{Joint, Method, Ring};
use crate::population::choose::judge::{Judge, Made};
use crate::population::kernel::joining::PlainJoining;
use crate::population::kernel::{KernelError, PairKind, PairValues, Part};
use crate::tolerance::FitLimits;

/// The findings of one row.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Outcome {
    limits: Option<FitLimits>,
    loosest: Pair,
    tightest: Pair,
    slip: Least,
    shaft: Least,
    hub: Least,
    hub_temperature: Option<f64>,
    shaft_temperature: Option<f64>,
    hold: bool,
    strength: bool,
    assembly: bool,
}

/// A least safety with the pair and state where it is found.
#[derive(Debug, Clone, PartialEq, Default)]
struct Least {
    safety: Option<f64>,
    pair: Cow<'static, str>,
    state: String,
}

impl Least {
    fn of(safety: f64, pair: PairKind, state: Option<usize>, joint: &Joint) -> Self {
        let pair = if pair == PairKind::Loosest { "loosest" } else { "tightest" };
        let state = state.and_then(|number| joint.duty.get(number));
        let state = state.map_or("shop temperature", |state| state.name.as_str());
        Self { safety: Some(safety), pair: Cow::Borrowed(pair), state: state.to_owned() }
    }

    /// From a verdict, whose place is told as `tightest pair, rated`.
    fn of_verdict(verdict: &Verdict, joint: &Joint) -> Self {
        let Some(safety) = verdict.found else { return Self::default() };
        let names = joint.duty.iter().map(|state| state.name.as_str()).chain(["shop temperature"]);
        let told = names.filter_map(|name| {
            let pair = verdict.at.strip_suffix(name)?.strip_suffix(", ")?;
            Some((pair.strip_suffix(" pair").unwrap_or(pair).to_owned(), name.to_owned()))
        });
        // The longest name that fits is the whole one.
        let (pair, state) = told.max_by_key(|(_, name)| name.len()).unwrap_or_default();
        Self { safety: Some(safety), pair: Cow::Owned(pair), state }
    }
}

/// One pair at the shop temperature, at rest, SI.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
struct Pair {
    interference: f64,
    effective_interference: f64,
    pressure: f64,
    hub_bore_hoop: f64,
    hub_bore_von_mises: f64,
    hub_rim_hoop: f64,
    shaft_surface_hoop: f64,
    shaft_bore_hoop: f64,
    shaft_von_mises: f64,
    torque_capacity: f64,
    axial_capacity: f64,
    press_force: f64,
    release_force: f64,
}

/// What stands in a cell of the output.
pub(super) enum Value<'a> {
    Number(f64),
    Text(&'a str),
    None,
}

/// Name and value of a column.
pub(super) type OutputColumn = (&'static str, fn(&Outcome) -> Value<'_>);

fn microns(metres: f64) -> Value<'static> {
    let exact = metres * 1e6;
    let rounded = (exact * 1e6).round() / 1e6;
    let tidy = if (exact - rounded).abs() <= 1e-9 * exact.abs() { rounded } else { exact };
    Value::Number(tidy + 0.0)
}

fn mega(pascal: f64) -> Value<'static> {
    Value::Number(pascal * 1e-6 + 0.0)
}

fn plain(value: f64) -> Value<'static> {
    Value::Number(value + 0.0)
}

fn optional(value: Option<f64>) -> Value<'static> {
    value.map_or(Value::None, plain)
}

fn celsius(kelvin: Option<f64>) -> Value<'static> {
    kelvin.map_or(Value::None, |kelvin| plain(kelvin - 273.15))
}

fn limit(outcome: &Outcome, of: fn(&FitLimits) -> f64) -> Value<'_> {
    outcome.limits.as_ref().map_or(Value::None, |limits| microns(of(limits)))
}

fn met(met: bool) -> Value<'static> {
    Value::Text(if met { "met" } else { "not met" })
}

/// The columns of a pair, with its name before each.
macro_rules! pair_columns {
    ($pair:ident, $($name:literal => $show:ident $field:ident,)*) => {
        [$((concat!(stringify!($pair), ".", $name), (|outcome: &Outcome| $show(outcome.$pair.$field)) as fn(&Outcome) -> Value<'_>)),*]
    };
}

macro_rules! pair_table {
    ($pair:ident) => {
        pair_columns! { $pair,
            "interference_um" => microns interference,
            "effective_interference_um" => microns effective_interference,
            "pressure_mpa" => mega pressure,
            "hub_bore_hoop_mpa" => mega hub_bore_hoop,
            "hub_bore_von_mises_mpa" => mega hub_bore_von_mises,
            "hub_rim_hoop_mpa" => mega hub_rim_hoop,
            "shaft_surface_hoop_mpa" => mega shaft_surface_hoop,
            "shaft_bore_hoop_mpa" => mega shaft_bore_hoop,
            "shaft_von_mises_mpa" => mega shaft_von_mises,
            "torque_capacity_nm" => plain torque_capacity,
            "axial_capacity_n" => plain axial_capacity,
            "press_force_n" => plain press_force,
            "release_force_n" => plain release_force,
        }
    };
}

const BEFORE: [OutputColumn; 4] = [
    ("hole_lower_um", |outcome| limit(outcome, |limits| limits.hole.lower)),
    ("hole_upper_um", |outcome| limit(outcome, |limits| limits.hole.upper)),
    ("shaft_lower_um", |outcome| limit(outcome, |limits| limits.shaft.lower)),
    ("shaft_upper_um", |outcome| limit(outcome, |limits| limits.shaft.upper)),
];

const AFTER: [OutputColumn; 14] = [
    ("slip_safety", |outcome| optional(outcome.slip.safety)),
    ("slip_state", |outcome| Value::Text(&outcome.slip.state)),
    ("shaft_safety", |outcome| optional(outcome.shaft.safety)),
    ("shaft_pair", |outcome| Value::Text(&outcome.shaft.pair)),
    ("shaft_state", |outcome| Value::Text(&outcome.shaft.state)),
    ("hub_safety", |outcome| optional(outcome.hub.safety)),
    ("hub_pair", |outcome| Value::Text(&outcome.hub.pair)),
    ("hub_state", |outcome| Value::Text(&outcome.hub.state)),
    ("hub_temperature_c", |outcome| celsius(outcome.hub_temperature)),
    ("shaft_temperature_c", |outcome| celsius(outcome.shaft_temperature)),
    ("hold", |outcome| met(outcome.hold)),
    ("strength", |outcome| met(outcome.strength)),
    ("assembly", |outcome| met(outcome.assembly)),
    ("ok", |outcome| Value::Text(if outcome.meets_all() { "true" } else { "false" })),
];

/// Every output column, in order; names and units as in the findings as JSON.
pub(super) fn output_columns() -> Vec<OutputColumn> {
    let pairs = [pair_table!(loosest), pair_table!(tightest)];
    BEFORE.into_iter().chain(pairs.into_iter().flatten()).chain(AFTER).collect()
}

impl Outcome {
    /// Whether every requirement is met.
    pub(super) fn meets_all(&self) -> bool {
        self.hold && self.strength && self.assembly
    }

    /// The findings of a joint; the full computation takes what the kernel does not cover: other joints than those of
    /// two rings, and a time from oven or bath to seated that may still be met.
    pub(super) fn of(joint: &Joint) -> Result<Self, String> {
        match Self::by_kernel(joint) {
            Ok((outcome, false)) => Ok(outcome),
            Ok((_, true)) | Err(_) => match crate::findings::compute(joint.clone()) {
                Ok(findings) => Ok(Self::of_findings(&findings)),
                Err(error) => Err(error.to_string()),
            },
        }
    }

    /// The findings, and whether a handling time is left to be judged.
    fn by_kernel(joint: &Joint) -> Result<(Self, bool), KernelError> {
        let judge = Judge::of(joint)?;
        let plain = judge.plain();
        let limits = joint.fits.first().map(|fit| fit.limits).ok_or(KernelError::NotTwoRings(0))?;
        let interference = limits.interference();
        let loosest = plain.pair(interference.loosest, PairKind::Loosest)?;
        let tightest = plain.pair(interference.tightest, PairKind::Tightest)?;
        let (loose, tight) = (loosest.effective_interference, tightest.effective_interference);
        let strength = |part: Part| {
            let least = plain.least_safety(part, loose, tight);
            least.map_or_else(Least::default, |(safety, place)| {
                Least::of(safety, place.pair, place.state, joint)
            })
        };
        let slip = plain.least_slip_safety(loose).map_or_else(Least::default, |(safety, state)| {
            Least::of(safety, PairKind::Loosest, Some(state), joint)
        });
        let made = Made { loosest: interference.loosest, tightest: interference.tightest };
        let met = judge.verdicts(made);
        let (hub_temperature, shaft_temperature) = temperatures(judge.joining(), joint, made.tightest);
        let outcome = Self {
            limits: Some(limits),
            loosest: Pair::of_values(&loosest),
            tightest: Pair::of_values(&tightest),
            slip,
            shaft: strength(Part::Shaft),
            hub: strength(Part::Hub),
            hub_temperature,
            shaft_temperature,
            hold: met.hold,
            strength: met.strength,
            assembly: met.assembly,
        };
        Ok((outcome, met.assembly && judge.handling_time().is_some()))
    }

    fn of_findings(findings: &Findings) -> Self {
        let joint = &findings.joint;
        let least = |subject: &str| {
            let all = findings.verdicts.iter().filter(|verdict| verdict.subject.starts_with(subject));
            let least = all
                .min_by(|a, b| a.found.unwrap_or(f64::INFINITY).total_cmp(&b.found.unwrap_or(f64::INFINITY)));
            least.map_or_else(Least::default, |verdict| Least::of_verdict(verdict, joint))
        };
        let of_ring = |ring: Option<&Ring>| {
            ring.map_or_else(Least::default, |ring| least(&format!("{} safety against", ring.name)))
        };
        let met = |question: Question| {
            findings.verdicts.iter().all(|verdict| verdict.question != question || verdict.ok)
        };
        let (hub_temperature, shaft_temperature) = found_temperatures(findings);
        Self {
            limits: joint.fits.first().map(|fit| fit.limits),
            loosest: Pair::of_findings(&findings.extremes.loosest),
            tightest: Pair::of_findings(&findings.extremes.tightest),
            slip: least("safety against slip"),
            shaft: of_ring(joint.rings.first()),
            hub: of_ring(joint.rings.last()),
            hub_temperature,
            shaft_temperature,
            hold: met(Question::Hold),
            strength: met(Question::Strength),
            assembly: met(Question::Assembly),
        }
    }
}

impl Pair {
    fn of_values(pair: &PairValues) -> Self {
        Self {
            interference: pair.interference,
            effective_interference: pair.effective_interference,
            pressure: pair.pressure,
            hub_bore_hoop: pair.hub.bore.hoop,
            hub_bore_von_mises: pair.hub.bore.von_mises,
            hub_rim_hoop: pair.hub.rim.hoop,
            shaft_surface_hoop: pair.shaft.rim.hoop,
            shaft_bore_hoop: pair.shaft.bore.hoop,
            shaft_von_mises: pair.shaft.bore.von_mises.max(pair.shaft.rim.von_mises),
            torque_capacity: pair.torque_capacity,
            axial_capacity: pair.axial_capacity,
            press_force: pair.press_force.high,
            release_force: pair.release_force.high,
        }
    }

    fn of_findings(pair: &crate::findings::PairFindings) -> Self {
        let of = |ring: Option<&RingStress>, value: fn(&RingStress) -> f64| ring.map_or(f64::NAN, value);
        let (shaft, hub) = (pair.rings.first(), pair.rings.last());
        Self {
            interference: pair.interference,
            effective_interference: pair.effective_interference,
            pressure: pair.pressure,
            hub_bore_hoop: of(hub, |ring| ring.bore.hoop),
            hub_bore_von_mises: of(hub, |ring| ring.bore.von_mises),
            hub_rim_hoop: of(hub, |ring| ring.rim.hoop),
            shaft_surface_hoop: of(shaft, |ring| ring.rim.hoop),
            shaft_bore_hoop: of(shaft, |ring| ring.bore.hoop),
            shaft_von_mises: of(shaft, |ring| ring.bore.von_mises.max(ring.rim.von_mises)),
            torque_capacity: pair.torque_capacity,
            axial_capacity: pair.axial_capacity,
            press_force: pair.press_force.high,
            release_force: pair.release_force.high,
        }
    }
}

/// Temperatures of hub and shaft while joining by the method of the joint, K; none when it presses.
fn temperatures(joining: &PlainJoining<'_>, joint: &Joint, made: f64) -> (Option<f64>, Option<f64>) {
    let plan = &joint.assembly;
    let found = joining.by_method(plan.method, plan.bath, made).and_then(|(found, _)| found);
    match plan.method {
        Method::Press => (None, None),
        Method::HeatHub => (found, Some(plan.shop_temperature)),
        Method::ChillShaft => (Some(plan.shop_temperature), found),
        Method::HeatAndChill => (found, Some(crate::findings::bath_temperature(plan.bath))),
    }
}

fn found_temperatures(findings: &Findings) -> (Option<f64>, Option<f64>) {
    let (plan, assembly) = (&findings.joint.assembly, &findings.assembly);
    let bath = assembly.baths.iter().find(|bath| bath.bath == plan.bath);
    match plan.method {
        Method::Press => (None, None),
        Method::HeatHub => (assembly.heat_hub.temperature, Some(plan.shop_temperature)),
        Method::ChillShaft => (Some(plan.shop_temperature), assembly.chill_shaft.temperature),
        Method::HeatAndChill => {
            (bath.and_then(|bath| bath.hub_temperature), bath.map(|bath| bath.temperature))
        }
    }
}
