//! The choice of a fit as JSON: fixed names, units in the names, full precision.

use serde::Serialize;

use super::words;
use crate::population::choose::{Choice, ChosenFit, Opening, Parameter, Requirement, Standard, Subject};
use crate::tolerance::Limits;

#[derive(Serialize)]
struct Document<'a> {
    choice: u8,
    version: &'static str,
    title: &'a str,
    digest: &'a str,
    set: Vec<String>,
    diameter_mm: f64,
    standard: &'static str,
    considered: usize,
    short_of_time: usize,
    window: WindowLine,
    requirements: Vec<RequirementLine>,
    fits: Vec<FitLine<'a>>,
    given: Option<FitLine<'a>>,
    nearest: Option<FitLine<'a>>,
    blocking: Vec<String>,
    changes: Vec<ChangeLine<'a>>,
    defaults: Vec<DefaultLine<'a>>,
    notes: Vec<String>,
}

#[derive(Serialize)]
struct WindowLine {
    least_um: Option<f64>,
    greatest_um: Option<f64>,
}

#[derive(Serialize)]
struct RequirementLine {
    subject: String,
    state: Option<String>,
    required: Option<f64>,
    unit: &'static str,
    pair: &'static str,
    least_um: Option<f64>,
    greatest_um: Option<f64>,
    never_met: bool,
    in_window: bool,
}

#[derive(Serialize)]
struct FitLine<'a> {
    fit: &'a str,
    basis: &'static str,
    preferred_by: &'a [&'static str],
    relative_cost: Option<f64>,
    finest_grade: Option<&'static str>,
    hole: MemberLine,
    shaft: MemberLine,
    loosest_um: f64,
    tightest_um: f64,
    margin_below_um: Option<f64>,
    margin_above_um: Option<f64>,
    slip_safety: Option<f64>,
    shaft_safety: Option<f64>,
    hub_safety: Option<f64>,
    #[serde(skip_serializing_if = "Option::is_none")]
    press_force_n: Option<f64>,
    #[serde(skip_serializing_if = "Option::is_none")]
    hub_temperature_c: Option<f64>,
    #[serde(skip_serializing_if = "Option::is_none")]
    shaft_temperature_c: Option<f64>,
    #[serde(skip_serializing_if = "Option::is_none")]
    handling_time_s: Option<f64>,
    #[serde(skip_serializing_if = "Option::is_none")]
    bearing: Option<SeatLine<'a>>,
    #[serde(skip_serializing_if = "Option::is_none")]
    refused: Option<&'a str>,
    ok: bool,
}

/// What the seat does to a bearing.
#[derive(Serialize)]
struct SeatLine<'a> {
    least_clearance_um: f64,
    at: &'a str,
    hoop_stress_mpa: f64,
}

#[derive(Serialize)]
struct MemberLine {
    lower_um: f64,
    upper_um: f64,
}

#[derive(Serialize)]
struct ChangeLine<'a> {
    key: Option<&'static str>,
    subject: String,
    from: f64,
    unit: &'static str,
    smallest: OpeningLine<'a>,
    for_workshop: Option<OpeningLine<'a>>,
}

#[derive(Serialize)]
struct OpeningLine<'a> {
    to: f64,
    written: &'a str,
    lets_in: &'a str,
}

#[derive(Serialize)]
struct DefaultLine<'a> {
    key: &'a str,
    value: &'a str,
    source: &'a str,
}

/// The choice as JSON text with a line break at its end; every fit that meets the requirements is in it.
pub fn to_json(choice: &Choice) -> String {
    let joint = &choice.joint;
    let defaults = joint.defaults.iter().map(|default| DefaultLine {
        key: &default.key,
        value: &default.value,
        source: &default.source,
    });
    let mut notes: Vec<String> = words::grade_note(choice).into_iter().collect();
    notes.extend(joint.remarks.iter().cloned());
    notes.extend(words::changes_note(choice).filter(|_| choice.fits.is_empty()).map(str::to_owned));
    notes.push(words::cost_note(choice));
    let document = Document {
        choice: 1,
        version: env!("CARGO_PKG_VERSION"),
        title: &joint.title,
        digest: &joint.digest,
        set: joint.set.iter().map(|(key, value)| format!("{key}={value}")).collect(),
        diameter_mm: joint.diameter * 1e3,
        standard: match choice.options.standard {
            Standard::Iso286 => "ISO 286",
            Standard::AnsiB4_1 => "ANSI B4.1",
        },
        considered: choice.considered,
        short_of_time: choice.short_of_time,
        window: WindowLine {
            least_um: microns(choice.window.least),
            greatest_um: choice.window.greatest.and_then(microns),
        },
        requirements: choice.requirements.iter().map(|wanted| requirement(choice, wanted)).collect(),
        fits: choice.fits.iter().map(|fit| line(choice, fit)).collect(),
        given: choice.given.as_ref().map(|fit| line(choice, fit)),
        nearest: choice.nearest.as_ref().map(|fit| line(choice, fit)),
        blocking: if choice.fits.is_empty() { words::blocking(choice) } else { Vec::new() },
        changes: choice
            .changes
            .iter()
            .map(|change| ChangeLine {
                key: change.parameter.key(),
                subject: words::parameter(choice, change.parameter),
                from: change.from,
                unit: match change.parameter {
                    Parameter::HubOuterDiameter | Parameter::Length => "m",
                    Parameter::ShaftStrength | Parameter::HubStrength => "Pa",
                    Parameter::HoldingFriction => "",
                },
                smallest: opening(&change.smallest),
                for_workshop: change.for_workshop.as_ref().map(opening),
            })
            .collect(),
        defaults: defaults.collect(),
        notes,
    };
    let mut text = serde_json::to_string_pretty(&document).unwrap_or_default();
    text.push('\n');
    text
}

fn opening(opening: &Opening) -> OpeningLine<'_> {
    OpeningLine { to: opening.to, written: &opening.written, lets_in: &opening.lets_in }
}

fn requirement(choice: &Choice, wanted: &Requirement) -> RequirementLine {
    let kelvin = matches!(wanted.subject, Subject::HubTemperature | Subject::ShaftTemperature);
    RequirementLine {
        subject: words::subject(choice, wanted.subject),
        state: match wanted.subject {
            Subject::Slip(number) | Subject::GapingEdge(number) | Subject::LoadedEdge(number) => {
                choice.joint.duty.get(number).map(|state| state.name.clone())
            }
            _ => None,
        },
        required: wanted.required.map(|required| if kelvin { required - 273.15 } else { required }),
        unit: match wanted.subject {
            Subject::PressForce => "N",
            Subject::HandlingTime => "s",
            _ if kelvin => "degC",
            _ => "",
        },
        pair: words::pair(wanted),
        least_um: wanted.least.and_then(microns),
        greatest_um: wanted.greatest.and_then(microns),
        never_met: wanted.never_met,
        in_window: wanted.subject.has_edges(),
    }
}

fn line<'a>(choice: &Choice, fit: &'a ChosenFit) -> FitLine<'a> {
    let found = |wanted: fn(Subject) -> bool| {
        let all = choice.requirements.iter().zip(&fit.found);
        all.filter(|(requirement, _)| wanted(requirement.subject))
            .filter_map(|(_, (found, _))| found.filter(|found| found.is_finite()))
            .min_by(f64::total_cmp)
    };
    let celsius = |kelvin: f64| kelvin - 273.15;
    FitLine {
        fit: &fit.callout,
        basis: words::basis(choice, fit),
        preferred_by: &fit.preferred_by,
        relative_cost: fit.relative_cost,
        finest_grade: fit.finest_grade.map(|grade| grade.name()),
        hole: member(&fit.limits.hole),
        shaft: member(&fit.limits.shaft),
        loosest_um: tidy(fit.loosest * 1e6),
        tightest_um: tidy(fit.tightest * 1e6),
        margin_below_um: microns(fit.margin_below),
        margin_above_um: fit.margin_above.and_then(microns),
        slip_safety: found(|subject| matches!(subject, Subject::Slip(_))),
        shaft_safety: found(|subject| subject == Subject::ShaftStrength),
        hub_safety: found(|subject| subject == Subject::HubStrength),
        press_force_n: found(|subject| subject == Subject::PressForce),
        hub_temperature_c: found(|subject| subject == Subject::HubTemperature).map(celsius),
        shaft_temperature_c: found(|subject| subject == Subject::ShaftTemperature).map(celsius),
        handling_time_s: found(|subject| subject == Subject::HandlingTime),
        bearing: fit.seat.as_ref().map(|seat| SeatLine {
            least_clearance_um: seat.least_clearance * 1e6,
            at: &seat.at,
            hoop_stress_mpa: seat.hoop_stress * 1e-6,
        }),
        refused: fit.refused.as_deref(),
        ok: fit.meets_all(),
    }
}

fn member(limits: &Limits) -> MemberLine {
    MemberLine { lower_um: tidy(limits.lower * 1e6), upper_um: tidy(limits.upper * 1e6) }
}

/// Micrometres; none when the number is not finite.
fn microns(metres: f64) -> Option<f64> {
    metres.is_finite().then_some(metres * 1e6 + 0.0)
}

/// Tabulated figures without the noise that the factor adds.
fn tidy(microns: f64) -> f64 {
    (microns * 1e6).round() / 1e6 + 0.0
}
