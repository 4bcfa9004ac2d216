//! The verdict in one sentence, and each requirement with what was found.

use maud::{Markup, html};

use super::table::{NONE, safety, safety_required, scrolling};
use super::{Sheet, capital};
use crate::findings::times::HandlingFindings;
use crate::findings::{Question, Verdict, VerdictUnit};
use crate::joint::Method;
use crate::report::seating::time_allowed;
use crate::report::typeset::prose;
use crate::report::units::{Measure, Units};

/// Sentence and table.
pub(super) fn body(sheet: Sheet) -> Markup {
    let verdicts = &sheet.findings.verdicts;
    let missed = verdicts.iter().filter(|verdict| !verdict.ok).count();
    let status = match missed {
        0 => "All requirements are met.".to_owned(),
        1 => "One requirement is NOT MET.".to_owned(),
        count => format!("{count} requirements are NOT MET."),
    };
    html! {
        p.verdict { (sentence(sheet)) " " strong.status.missed[missed > 0] { (status) } }
        (scrolling("Requirements", "answers", &table(sheet)))
    }
}

/// The verdict in one sentence: hold, strength, assembly.
fn sentence(sheet: Sheet) -> String {
    let parts: Vec<String> =
        [hold(sheet), strength(sheet), assembly(sheet)].into_iter().filter(|part| !part.is_empty()).collect();
    format!("{}.", capital(&parts.join("; ")))
}

/// The verdict of a question that is furthest from being met, or nearest to its limit.
fn governing<'a>(sheet: Sheet<'a>, question: Question) -> Option<&'a Verdict> {
    let margin = |verdict: &Verdict| match (verdict.found, verdict.required) {
        (Some(found), Some(required)) if required > 0.0 => found / required,
        (Some(found), None) => 1e6 + found,
        _ => 1e9,
    };
    sheet
        .findings
        .verdicts
        .iter()
        .filter(|verdict| verdict.question == question)
        .min_by(|a, b| a.ok.cmp(&b.ok).then(margin(a).total_cmp(&margin(b))))
}

fn hold(sheet: Sheet) -> String {
    let Some(verdict) = governing(sheet, Question::Hold) else { return String::new() };
    match (verdict.ok, verdict.found) {
        (true, Some(found)) => {
            let against = verdict.subject.strip_prefix("safety ").unwrap_or(&verdict.subject);
            format!("holds with {} {against} ({})", safety(found), verdict.at)
        }
        (true, None) => format!("holding is not judged ({})", verdict.at),
        (false, found) => format!("does NOT hold: {}", shortfall(sheet.units, verdict, found)),
    }
}

fn strength(sheet: Sheet) -> String {
    let Some(verdict) = governing(sheet, Question::Strength) else { return String::new() };
    match (verdict.ok, verdict.found) {
        (true, Some(found)) => {
            format!("keeps its strength: {} {} ({})", verdict.subject, safety(found), verdict.at)
        }
        (true, None) => "no strength is known to judge".to_owned(),
        (false, found) => format!("does NOT keep its strength: {}", shortfall(sheet.units, verdict, found)),
    }
}

fn assembly(sheet: Sheet) -> String {
    let units = sheet.units;
    let assembly = &sheet.findings.assembly;
    let plan = &sheet.findings.joint.assembly;
    let (shaft, hub) = super::instructions::names(sheet);
    let temperature = |value: f64| units.text(Measure::Temperature, value);
    // The time there is holds for a part as it leaves oven or bath, which is more than it needs to clear.
    let left = |needed: f64, leaves: fn(&HandlingFindings) -> f64| {
        let handling = assembly.times.handling.as_ref().filter(|handling| handling.tightest.gone.is_some());
        match handling.map(leaves).map(temperature) {
            Some(leaves) if leaves != temperature(needed) => {
                format!("{leaves} ({} is needed)", temperature(needed))
            }
            _ => temperature(needed),
        }
    };
    let missed = governing(sheet, Question::Assembly).filter(|verdict| !verdict.ok);
    if let Some(verdict) = missed {
        return format!("can NOT be joined as asked: {}", shortfall(units, verdict, verdict.found));
    }
    let way = match plan.method {
        Method::Press => {
            format!(
                "press in with up to {}",
                units.brief(Measure::Force, assembly.press.tightest.peak_force).text()
            )
        }
        Method::HeatHub => match assembly.heat_hub.temperature {
            Some(hot) => format!("heat the {hub} to {}", left(hot, |handling| handling.hub_temperature)),
            None => format!("heating the {hub} does not clear"),
        },
        Method::ChillShaft => match assembly.chill_shaft.temperature {
            Some(cold) => {
                format!("chill the {shaft} to {}", left(cold, |handling| handling.shaft_temperature))
            }
            None => "chilling alone does not clear".to_owned(),
        },
        Method::HeatAndChill => {
            let bath = assembly.baths.iter().find(|bath| bath.bath == plan.bath);
            match bath.and_then(|bath| bath.hub_temperature.map(|hot| (bath.temperature, hot))) {
                Some((cold, hot)) => format!(
                    "chill the {shaft} to {} and heat the {hub} to {}",
                    left(cold, |handling| handling.shaft_temperature),
                    left(hot, |handling| handling.hub_temperature)
                ),
                None => "heating and chilling together do not clear".to_owned(),
            }
        }
    };
    match assembly.times.handling.as_ref().and_then(|handling| handling.tightest.gone) {
        Some(gone) => format!("{way} and seat it within {}", time_allowed(gone)),
        None => way,
    }
}

fn shortfall(units: Units, verdict: &Verdict, found: Option<f64>) -> String {
    let found = found.map_or_else(|| "does not exist".to_owned(), |value| shown(units, verdict.unit, value));
    match verdict.required {
        Some(required) => format!(
            "{} {found} where {} is required ({})",
            verdict.subject,
            asked(units, verdict.unit, required),
            verdict.at
        ),
        None => format!("{} {found} ({})", verdict.subject, verdict.at),
    }
}

fn asked(units: Units, unit: VerdictUnit, value: f64) -> String {
    if unit == VerdictUnit::Safety { safety_required(value) } else { shown(units, unit, value) }
}

fn shown(units: Units, unit: VerdictUnit, value: f64) -> String {
    match unit {
        VerdictUnit::Safety => safety(value),
        VerdictUnit::Force => units.brief(Measure::Force, value).text(),
        VerdictUnit::Temperature => units.text(Measure::Temperature, value),
        VerdictUnit::Share => format!("{:.1}\u{2009}%", value * 100.0),
        VerdictUnit::Time => prose(&time_allowed(value)),
    }
}

fn question(question: Question) -> &'static str {
    match question {
        Question::Hold => "Hold",
        Question::Strength => "Strength",
        Question::Assembly => "Assembly",
    }
}

fn table(sheet: Sheet) -> Markup {
    let mut verdicts: Vec<&Verdict> = sheet.findings.verdicts.iter().collect();
    verdicts.sort_by_key(|verdict| verdict.question);
    html! {
        thead {
            tr {
                th scope="col" { "Question" }
                th scope="col" { "Judged" }
                th.r scope="col" { "Required" }
                th.r scope="col" { "Found" }
                th scope="col" { "Result" }
                th scope="col" { "At" }
            }
        }
        tbody {
            @for (place, verdict) in verdicts.iter().enumerate() {
                @let first = place == 0 || verdicts[place - 1].question != verdict.question;
                tr.first[first] {
                    th scope="row" { (if first { question(verdict.question) } else { "" }) }
                    td { (verdict.subject) }
                    td.r { (required(sheet, verdict)) }
                    td.r { (verdict.found.map_or_else(|| NONE.to_owned(), |value| shown(sheet.units, verdict.unit, value))) }
                    td.result.missed[!verdict.ok] { (result(verdict)) }
                    td { (verdict.at) }
                }
            }
        }
    }
}

/// The requirement with its sense: a safety is a least value, a force or temperature a greatest one, but a
/// chilled shaft must not have to be colder than its bath.
fn required(sheet: Sheet, verdict: &Verdict) -> String {
    let Some(value) = verdict.required else { return "none set".to_owned() };
    let chilled = sheet.findings.joint.assembly.method == Method::ChillShaft;
    let sense = match verdict.unit {
        VerdictUnit::Safety | VerdictUnit::Time => "≥",
        VerdictUnit::Temperature if chilled => "≥",
        VerdictUnit::Force | VerdictUnit::Temperature | VerdictUnit::Share => "≤",
    };
    format!("{sense} {}", asked(sheet.units, verdict.unit, value))
}

fn result(verdict: &Verdict) -> &'static str {
    match (verdict.ok, verdict.required) {
        (false, _) => "NOT MET",
        (true, Some(_)) => "met",
        (true, None) => "no requirement",
    }
}
