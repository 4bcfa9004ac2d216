//! What is said of a choice, in words that the terminal and the page share.

use std::fmt::Write;

use crate::assembly::bearing_tables::BearingRing;
use crate::findings::{bath_name, failure};
use crate::joint::{Method, Ring};
use crate::population::choose::{
    Basis, Change, Choice, ChosenFit, Opening, Parameter, Requirement, Subject, WORKSHOP,
};
use crate::quantity::factor_found as safety;
use crate::quantity::{Measure, UnitSystem, display_unit, show};
use crate::report::seating::time_allowed;
use crate::tolerance::iso286::Grade;

/// Fits that are shown when not all are asked for.
pub(super) const MOST_SHOWN: usize = 20;

/// Fits of hole or shaft basis below which mixed ones are shown as well.
const FEW: usize = 6;

/// What the relative cost is.
const COST_OF_FITS: &str =
    "Relative cost is half IT7 over the tolerance of the hole and half IT6 over that of the shaft";
const COST_OF_SHAFT: &str = "Relative cost is IT6 over the tolerance of the shaft";
const COST_OF_HOUSING: &str = "Relative cost is IT7 over the tolerance of the housing";

/// Where the order of the fits comes from.
pub(super) fn cost_note(choice: &Choice) -> String {
    let source = "cost as the reciprocal of the tolerance (Chase and Greenwood, Manufacturing Review 1 (1988) 50-59, \
                  from memory)";
    let (what, more) = match choice.joint.bearing.as_ref().map(|seat| seat.ring) {
        None => {
            (COST_OF_FITS, ", a hole costing as much as a shaft one grade finer (common practice, no source)")
        }
        Some(BearingRing::Inner) => (COST_OF_SHAFT, ""),
        Some(BearingRing::Outer) => (COST_OF_HOUSING, ""),
    };
    format!("{what}: {source}{more}. It orders fits and is no price.")
}

/// What the columns of the list show.
pub(super) fn list_note(choice: &Choice) -> String {
    let mut said = String::new();
    if choice.joint.bearing.is_none() {
        said.push_str("* preferred by ISO 286-1 or ANSI B4.2. ");
    }
    said.push_str(
        "Below and above are to spare: the loosest pair over the least allowed, the tightest pair under the greatest. \
         Safeties are the least over every state.",
    );
    if time_requirement(choice).is_some() {
        said.push_str(" Time is that of the tightest pair, worked out for each fit by itself: it bounds no interference.");
    }
    if let Some(seat) = &choice.joint.bearing {
        let _ = write!(
            said,
            " Left is the least radial clearance left after mounting and in every state, below 0 preload; hoop the \
             greatest hoop stress in the {}. Neither is a requirement, so no fit is left out for it.",
            seat.ring_name()
        );
    }
    said
}

/// The time from oven or bath to seated that is required, with its number among the requirements.
fn time_requirement(choice: &Choice) -> Option<(usize, &Requirement)> {
    choice.requirements.iter().enumerate().find(|(_, wanted)| !wanted.subject.has_edges())
}

/// What is judged, with its state.
pub(super) fn subject(choice: &Choice, subject: Subject) -> String {
    let joint = &choice.joint;
    let strength = |ring: Option<&Ring>| match ring {
        Some(ring) => format!("{} safety against {}", ring.name, failure(ring)),
        None => "safety".to_owned(),
    };
    match subject {
        Subject::Slip(number) => {
            format!("safety against slip, {}", state_name(choice, number))
        }
        Subject::GapingEdge(number) => {
            format!("safety against a gaping edge, {}", state_name(choice, number))
        }
        Subject::LoadedEdge(number) => format!("safety of the loaded edge, {}", state_name(choice, number)),
        Subject::ShaftStrength => strength(joint.rings.first()),
        Subject::HubStrength => strength(joint.rings.get(1)),
        Subject::PressForce => "peak press force".to_owned(),
        Subject::HubTemperature if joint.assembly.method == Method::HeatAndChill => {
            format!("hub temperature besides {}", bath_name(joint.assembly.bath))
        }
        Subject::HubTemperature => "hub temperature".to_owned(),
        Subject::ShaftTemperature => format!("shaft temperature in {}", bath_name(joint.assembly.bath)),
        Subject::HandlingTime => {
            format!("time from {} to seated", if joint.assembly.heats() { "oven" } else { "bath" })
        }
    }
}

fn state_name(choice: &Choice, number: usize) -> &str {
    choice.joint.duty.get(number).map_or("", |state| state.name.as_str())
}

/// Whether what is judged is a force or a temperature of joining.
fn is_of_joining(subject: Subject) -> bool {
    matches!(subject, Subject::PressForce | Subject::HubTemperature | Subject::ShaftTemperature)
}

/// A number of a requirement with its unit.
pub(super) fn value(subject: Subject, number: f64, system: UnitSystem) -> String {
    match subject {
        Subject::PressForce => show(Measure::Force, number, system).to_string(),
        Subject::HubTemperature | Subject::ShaftTemperature => {
            show(Measure::Temperature, number, system).to_string()
        }
        Subject::HandlingTime => time_allowed(number),
        _ => safety(number),
    }
}

/// The requirement with the number it is held against.
pub(super) fn requirement(choice: &Choice, requirement: &Requirement) -> String {
    let joint = &choice.joint;
    let in_state = |name: &str, number: usize| (name.to_owned(), format!(", {}", state_name(choice, number)));
    let (name, state) = match requirement.subject {
        Subject::Slip(number) => in_state("safety against slip", number),
        Subject::GapingEdge(number) => in_state("safety against a gaping edge", number),
        Subject::LoadedEdge(number) => in_state("safety of the loaded edge", number),
        other => (subject(choice, other), String::new()),
    };
    let bound = match requirement.subject {
        Subject::PressForce | Subject::HubTemperature => "at most",
        Subject::ShaftTemperature => "of",
        _ => "at least",
    };
    match requirement.required {
        Some(required) => {
            format!("{name} {bound} {}{state}", value(requirement.subject, required, joint.display))
        }
        None => format!("{name} within the expansion data"),
    }
}

/// An interference rounded up, so that the printed one still meets a least one.
pub(in crate::report) fn rounded_up(interference: f64, system: UnitSystem) -> String {
    in_steps(interference, system, f64::ceil)
}

/// An interference rounded down, so that the printed one still meets a greatest one.
pub(in crate::report) fn rounded_down(interference: f64, system: UnitSystem) -> String {
    in_steps(interference, system, f64::floor)
}

/// Steps of 0.1 µm or 0.01 thou; what is a whole step to 1e-6 of it is left.
fn in_steps(interference: f64, system: UnitSystem, round: fn(f64) -> f64) -> String {
    let per_unit = if system == UnitSystem::Metric { 10.0 } else { 100.0 };
    let unit = display_unit(Measure::Deviation, system);
    let steps = unit.of(interference) * per_unit;
    let whole = if (steps - steps.round()).abs() < 1e-6 { steps.round() } else { round(steps) };
    show(Measure::Deviation, whole / per_unit / unit.per_si, system).number
}

/// Unit of an interference.
pub(in crate::report) fn unit(system: UnitSystem) -> &'static str {
    display_unit(Measure::Deviation, system).name
}

/// The allowed window in a sentence.
pub(super) fn window(choice: &Choice) -> String {
    let system = choice.joint.display;
    let least = choice.window.least;
    let (low, unit) = (rounded_up(least, system), unit(system));
    match choice.window.greatest {
        _ if !least.is_finite() => "no interference is enough".to_owned(),
        None => format!("{low} {unit} and more"),
        Some(greatest) if !greatest.is_finite() => "no interference meets every requirement".to_owned(),
        Some(greatest) if greatest < least => "empty".to_owned(),
        Some(greatest) => format!("{low} to {} {unit}", rounded_down(greatest, system)),
    }
}

/// The interferences that meet a requirement, without the unit.
pub(super) fn edge(choice: &Choice, requirement: &Requirement) -> String {
    let system = choice.joint.display;
    let (least, greatest) = (
        requirement.least.map(|least| rounded_up(least, system)),
        requirement.greatest.map(|greatest| rounded_down(greatest, system)),
    );
    match (least, greatest) {
        _ if !requirement.subject.has_edges() => "each fit by itself".to_owned(),
        _ if requirement.never_met => "none".to_owned(),
        (None, None) => "any".to_owned(),
        (Some(least), None) => format!("{least} or more"),
        (None, Some(greatest)) => format!("{greatest} or less"),
        (Some(least), Some(greatest)) => format!("{least} to {greatest}"),
    }
}

/// The pair that a requirement bounds.
pub(super) fn pair(requirement: &Requirement) -> &'static str {
    match (requirement.subject, requirement.least) {
        (Subject::Slip(_) | Subject::GapingEdge(_), _) => "loosest",
        (_, Some(_)) => "both",
        (_, None) => "tightest",
    }
}

/// Name of the basis of a fit.
pub(super) fn basis(choice: &Choice, fit: &ChosenFit) -> &'static str {
    match fit.basis {
        Some(Basis::Hole) => "hole basis",
        Some(Basis::Shaft) => "shaft basis",
        Some(Basis::Mixed) => "mixed",
        None if choice.joint.bearing.is_some() => "bearing seat",
        None => "own limits",
    }
}

/// The fits to show, and how many are left out: those of the two bases, or all when there are few of them.
pub(super) fn shown(choice: &Choice, all: bool) -> (Vec<&ChosenFit>, usize) {
    let bases: Vec<&ChosenFit> = choice.fits.iter().filter(|fit| fit.basis != Some(Basis::Mixed)).collect();
    let mut shown = if all || bases.len() < FEW { choice.fits.iter().collect() } else { bases };
    if !all {
        shown.truncate(MOST_SHOWN);
    }
    let left_out = choice.fits.len() - shown.len();
    (shown, left_out)
}

/// What stands beside a fit in a table.
pub(super) struct Row {
    pub(super) cost: String,
    pub(super) loosest: String,
    pub(super) tightest: String,
    pub(super) below: String,
    pub(super) above: String,
    /// Least safety over the states against slip, or against a gaping edge where nothing can slip.
    pub(super) hold: String,
    pub(super) shaft: String,
    pub(super) hub: String,
    /// Press force or temperature for joining, when that is required.
    pub(super) joining: Option<String>,
    /// Time from oven or bath to seated, s, when that is required.
    pub(super) time: Option<String>,
    /// Clearance left in a bearing, and the hoop stress in its ring, when one is fitted.
    pub(super) seat: Option<(String, String)>,
}

/// Heading of [`Row::hold`].
pub(super) fn hold_heading(choice: &Choice) -> &'static str {
    if slips(choice) { "slip" } else { "edge" }
}

/// Whether safety against slip is judged; otherwise only edges that may gape are.
fn slips(choice: &Choice) -> bool {
    choice.requirements.iter().any(|wanted| matches!(wanted.subject, Subject::Slip(_)))
}

/// Headings of [`Row::time`] and [`Row::seat`]; none for what is not judged or not there.
pub(super) fn last_headings(choice: &Choice) -> Vec<String> {
    let system = choice.joint.display;
    let mut headings: Vec<String> =
        time_requirement(choice).map(|_| "time s".to_owned()).into_iter().collect();
    if choice.joint.bearing.is_some() {
        headings.push("left".to_owned());
        headings.push(format!("hoop {}", display_unit(Measure::Pressure, system).name));
    }
    headings
}

impl Row {
    /// What stands under [`last_headings`].
    pub(super) fn last_cells(&self) -> impl Iterator<Item = &str> {
        let seat = self.seat.iter().flat_map(|(left, hoop)| [left.as_str(), hoop.as_str()]);
        self.time.iter().map(String::as_str).chain(seat)
    }
}

/// Heading of [`Row::joining`]; none when joining is not judged.
pub(super) fn joining_heading(choice: &Choice) -> Option<String> {
    let (name, measure) = match joining(choice)?.1 {
        Subject::PressForce => ("press", Measure::Force),
        Subject::ShaftTemperature => ("shaft", Measure::Temperature),
        _ => ("hub", Measure::Temperature),
    };
    Some(format!("{name} {}", display_unit(measure, choice.joint.display).name))
}

/// The requirement on joining with its number.
fn joining(choice: &Choice) -> Option<(usize, Subject)> {
    let subjects = choice.requirements.iter().map(|requirement| requirement.subject).enumerate();
    let mut joining = subjects.filter(|(_, subject)| is_of_joining(*subject));
    joining.next()
}

/// What stands beside a fit.
pub(super) fn row(choice: &Choice, fit: &ChosenFit) -> Row {
    let system = choice.joint.display;
    let deviation = |value: f64| show(Measure::Deviation, value, system).number;
    let none = || "-".to_owned();
    let least = |wanted: fn(Subject) -> bool| {
        let found = choice.requirements.iter().zip(&fit.found);
        let numbers =
            found.filter(|(requirement, _)| wanted(requirement.subject)).filter_map(|(_, found)| found.0);
        numbers.min_by(f64::total_cmp).map_or_else(none, safety)
    };
    let joining = joining(choice).map(|(number, subject)| {
        let measure = if subject == Subject::PressForce { Measure::Force } else { Measure::Temperature };
        let found = fit.found.get(number).and_then(|found| found.0);
        found.map_or_else(none, |found| show(measure, found, system).number)
    });
    let time = time_requirement(choice).map(|(number, _)| {
        let found = fit.found.get(number).and_then(|found| found.0);
        found.map_or_else(none, |time| crate::quantity::number(time.floor(), 6))
    });
    let seat = choice.joint.bearing.as_ref().map(|_| match &fit.seat {
        None => (none(), none()),
        Some(seat) => (
            rounded_down(seat.least_clearance, system),
            show(Measure::Pressure, seat.hoop_stress, system).number,
        ),
    });
    Row {
        time,
        seat,
        cost: fit.relative_cost.map_or_else(none, |cost| format!("{cost:.2}")),
        loosest: deviation(fit.loosest),
        tightest: deviation(fit.tightest),
        below: rounded_down(fit.margin_below, system),
        above: fit.margin_above.map_or_else(none, |above| rounded_down(above, system)),
        hold: if slips(choice) {
            least(|subject| matches!(subject, Subject::Slip(_)))
        } else {
            least(Subject::is_of_holding)
        },
        shaft: least(|subject| subject == Subject::ShaftStrength),
        hub: least(|subject| subject == Subject::HubStrength),
        joining,
    }
}

/// How many fits there are.
pub(super) fn heading(choice: &Choice) -> String {
    let what = if choice.joint.bearing.is_some() { "classes" } else { "fits" };
    match choice.fits.len() {
        0 => format!("None of {} {what} meets every requirement", choice.considered),
        1 => format!("1 of {} {what} meets every requirement", choice.considered),
        count => format!("{count} of {} {what} meet every requirement", choice.considered),
    }
}

/// How many fits of each basis there are.
pub(super) fn counts(choice: &Choice) -> String {
    if let Some(seat) = &choice.joint.bearing {
        let made = match seat.ring {
            BearingRing::Inner => "shaft",
            BearingRing::Outer => "housing",
        };
        let limits = &seat.limits;
        let deviation = |value: f64| show(Measure::Deviation, value, choice.joint.display).number;
        return format!(
            "classes of the {made} alone, the {} has its limits {} to {} {} by {}",
            seat.ring_name(),
            deviation(limits.value.lower),
            deviation(limits.value.upper),
            unit(choice.joint.display),
            limits.source
        );
    }
    let count = |basis| choice.fits.iter().filter(|fit| fit.basis == Some(basis)).count();
    format!(
        "{} of hole basis, {} of shaft basis, {} mixed",
        count(Basis::Hole),
        count(Basis::Shaft),
        count(Basis::Mixed)
    )
}

/// What a fit misses, each with what it gives; empty when it meets everything.
pub(super) fn missed(choice: &Choice, fit: &ChosenFit) -> Vec<String> {
    let system = choice.joint.display;
    let missed = choice.requirements.iter().zip(&fit.found).filter(|(_, (_, ok))| !ok);
    let missed = missed.map(|(wanted, (found, _))| {
        let found = found.map_or("none".to_owned(), |found| value(wanted.subject, found, system));
        format!("{}: {found}", requirement(choice, wanted))
    });
    missed.chain(fit.refused.as_ref().map(|why| format!("it cannot be computed: {why}"))).collect()
}

/// When no fit is left: what stands in the way, and by how much.
pub(super) fn blocking(choice: &Choice) -> Vec<String> {
    let system = choice.joint.display;
    let (below, above) = choice.binding();
    let mut said: Vec<String> = choice
        .requirements
        .iter()
        .filter(|wanted| wanted.never_met)
        .map(|wanted| format!("No interference gives {}.", requirement(choice, wanted)))
        .collect();
    if let (1.., Some((_, time))) = (choice.short_of_time, time_requirement(choice)) {
        said.push(format!(
            "{} {} everything but one: {}.",
            choice.short_of_time,
            if choice.short_of_time == 1 { "meets" } else { "meet" },
            requirement(choice, time)
        ));
        return said;
    }
    let (Some(below), Some(greatest)) = (below, choice.window.greatest) else { return said };
    let least = choice.window.least;
    if !said.is_empty() || !least.is_finite() || !greatest.is_finite() {
        return said;
    }
    let distance = |value: f64| show(Measure::Deviation, value, system).to_string();
    let above_words = above.map_or_else(String::new, |above| requirement(choice, above));
    if greatest < least {
        said.push(format!(
            "{} wants {} {} of interference, but {above_words} allows only {}: {} are lacking even without any tolerance.",
            sentence(&requirement(choice, below)),
            rounded_up(least, system),
            unit(system),
            rounded_down(greatest, system),
            distance(least - greatest),
        ));
        if let Some(above) = above
            && let Ok(Some(found)) = choice.found_at(above, least)
        {
            said.push(format!(
                "With {} {} the {} would be {}.",
                rounded_up(least, system),
                unit(system),
                subject(choice, above.subject),
                value(above.subject, found, system),
            ));
        }
    } else {
        said.push(format!(
            "The window of {} between {} and {above_words} is too narrow for the tolerances of any standard fit; \
             limits of your own between {} and {} {} would do.",
            distance(greatest - least),
            requirement(choice, below),
            rounded_up(least, system),
            rounded_down(greatest, system),
            unit(system),
        ));
    }
    said
}

/// Name of a number that may be changed.
pub(super) fn parameter(choice: &Choice, parameter: Parameter) -> String {
    let ring = |index: usize| {
        choice.joint.rings.get(index).map_or_else(String::new, |ring| {
            let property = if failure(ring) == "fracture" { "tensile" } else { "yield" };
            format!("{property} strength of the {}", ring.name)
        })
    };
    match parameter {
        Parameter::HubOuterDiameter => "outer diameter of the hub".to_owned(),
        Parameter::Length => "length of the hub".to_owned(),
        Parameter::ShaftStrength => ring(0),
        Parameter::HubStrength => ring(1),
        Parameter::HoldingFriction => "friction for holding".to_owned(),
    }
}

/// A change in words, without the name of the number.
pub(super) fn change(choice: &Choice, change: &Change) -> String {
    let system = choice.joint.display;
    let from = match change.parameter {
        Parameter::HubOuterDiameter | Parameter::Length => {
            show(Measure::Size, change.from, system).to_string()
        }
        Parameter::ShaftStrength | Parameter::HubStrength => {
            show(Measure::Pressure, change.from, system).to_string()
        }
        Parameter::HoldingFriction => crate::quantity::number(change.from, 4),
    };
    let opening = |opening: &Opening| {
        let percent = 100.0 * (opening.to / change.from - 1.0);
        format!("{} ({percent:+.1} %) lets in {}", opening.written, opening.lets_in)
    };
    let mut said = format!("{from} now; {}", opening(&change.smallest));
    if let Some(workshop) = &change.for_workshop {
        said.push_str(&format!("; {}", opening(workshop)));
    } else if change.smallest.finest_grade < Grade::numbered(WORKSHOP)
        && change.smallest.finest_grade.is_some()
    {
        said.push_str("; none of IT5 or coarser");
    }
    said
}

/// What is said above the changes; none when they speak for themselves.
pub(super) fn changes_note(choice: &Choice) -> Option<&'static str> {
    match (choice.short_of_time, time_requirement(choice).is_some(), choice.changes.is_empty()) {
        (1.., ..) => Some(
            "None is sought: the time bounds no interference, so it has no smallest change. More clearance, a hotter \
             oven (oven_temperature) or a quicker transfer gives more of it.",
        ),
        (0, _, true) => {
            Some("None was found: no change up to four times a dimension or strength, or a friction of 1.")
        }
        (0, true, false) => {
            Some("Each goes by the other requirements; the fit that it lets in meets the time as well.")
        }
        (0, false, false) => None,
    }
}

/// What a reader of the list should know of grades; none when nothing needs saying.
pub(super) fn grade_note(choice: &Choice) -> Option<String> {
    let limit = Grade::numbered(WORKSHOP);
    let fine = |grade: Option<Grade>| grade.is_some() && grade < limit;
    let said = if choice.fits.is_empty() {
        choice.changes.iter().any(|change| fine(change.smallest.finest_grade))
    } else {
        choice.fits.iter().all(|fit| fine(fit.finest_grade))
    };
    said.then(|| {
        "Grades finer than IT5 are made for gauges (textbooks after ISO 286, from memory); --finest 5 leaves them out."
            .to_owned()
    })
}

/// First letter in upper case.
pub(super) fn sentence(text: &str) -> String {
    let mut letters = text.chars();
    letters.next().map_or_else(String::new, |first| first.to_uppercase().chain(letters).collect())
}
