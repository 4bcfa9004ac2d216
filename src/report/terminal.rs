//! Findings as text for an 80-column terminal: the three answers first.

mod assembly;

use std::fmt::Write;

use anstyle::{AnsiColor, Style};
use comfy_table::{CellAlignment, Table, presets};

use super::bearing;
use super::seating::time_allowed;
use crate::findings::{Findings, PairFindings, Question, Verdict, VerdictUnit};
use crate::material::REFERENCE_TEMPERATURE;
use crate::quantity::{Measure, UnitSystem, display_unit, show};
use crate::quantity::{factor_found, factor_required};
use crate::tolerance::{Character, Extremes};

/// Width of the text.
pub const WIDTH: usize = 80;

pub(super) const GOOD: Style = AnsiColor::Green.on_default().bold();
pub(super) const BAD: Style = AnsiColor::Red.on_default().bold();
pub(super) const HEADING: Style = Style::new().bold();

/// The title and the three answers alone.
pub fn summary(findings: &Findings) -> String {
    let mut out = String::new();
    title(&mut out, findings);
    answers(&mut out, findings);
    out
}

/// The findings as text; styled with ANSI codes that the writer strips where they are not wanted.
pub fn text(findings: &Findings) -> String {
    let mut out = String::new();
    title(&mut out, findings);
    answers(&mut out, findings);
    extremes(&mut out, findings);
    duty(&mut out, findings);
    service(&mut out, findings);
    assembly::write(&mut out, findings);
    bearing(&mut out, findings);
    defaults(&mut out, findings);
    cautions(&mut out, findings);
    notes(&mut out, findings);
    out
}

/// Appends a line; writing to a string cannot fail.
pub(super) fn line(out: &mut String, text: impl AsRef<str>) {
    out.push_str(text.as_ref().trim_end());
    out.push('\n');
}

pub(super) fn heading(out: &mut String, text: &str) {
    line(out, "");
    line(out, format!("{HEADING}{text}{HEADING:#}"));
}

/// Wrapped text with a hanging indent.
pub(super) fn paragraph(out: &mut String, first: &str, text: &str) {
    let rest = " ".repeat(first.chars().count());
    let options =
        textwrap::Options::new(WIDTH).initial_indent(first).subsequent_indent(&rest).break_words(false);
    for wrapped in textwrap::wrap(text, options) {
        line(out, wrapped);
    }
}

fn title(out: &mut String, findings: &Findings) {
    let joint = &findings.joint;
    let mut name = if joint.title.is_empty() { "Joint".to_owned() } else { joint.title.clone() };
    if let Some(drawing) = &joint.drawing {
        let _ = write!(name, " · {drawing}");
    }
    let name = plain(&name);
    for wrapped in textwrap::wrap(&name, WIDTH) {
        line(out, format!("{HEADING}{wrapped}{HEADING:#}"));
    }
    let unit = display_unit(Measure::Deviation, joint.display).name;
    for (index, fit) in joint.fits.iter().enumerate() {
        let size = show(Measure::Size, joint.interface_diameter(index), joint.display);
        let interference = fit.limits.interference();
        let number = |metres| show(Measure::Deviation, metres, joint.display).number;
        let several = if joint.fits.len() > 1 { format!("fit {}  ", index + 1) } else { String::new() };
        paragraph(
            out,
            "",
            &format!(
                "{several}{size}  {}: {} fit, interference {} to {} {unit}",
                fit.callout,
                character_name(fit.limits.character()),
                number(interference.loosest),
                number(interference.tightest)
            ),
        );
    }
    for (key, value) in &joint.set {
        paragraph(out, "set ", &plain(&format!("{key} = {value}")));
    }
}

/// Text without control characters, so that a file cannot steer the terminal.
pub fn plain(text: &str) -> String {
    text.chars().map(|c| if c.is_control() { ' ' } else { c }).collect()
}

/// The kind of fit in a word.
pub fn character_name(character: Character) -> &'static str {
    match character {
        Character::Clearance => "clearance",
        Character::Transition => "transition",
        Character::Interference => "interference",
    }
}

/// The question in a word, as heading.
pub fn question_name(question: Question) -> &'static str {
    match question {
        Question::Hold => "hold",
        Question::Strength => "strength",
        Question::Assembly => "assembly",
    }
}

/// A verdict's number with its unit.
pub fn verdict_value(value: f64, unit: VerdictUnit, system: UnitSystem) -> String {
    match unit {
        VerdictUnit::Safety => factor_found(value),
        VerdictUnit::Force => show(Measure::Force, value, system).to_string(),
        VerdictUnit::Temperature => show(Measure::Temperature, value, system).to_string(),
        VerdictUnit::Share => format!("{:.1} %", value * 100.0),
        VerdictUnit::Time => time_allowed(value),
    }
}

/// What a verdict requires, with its unit.
pub fn verdict_required(value: f64, unit: VerdictUnit, system: UnitSystem) -> String {
    match unit {
        VerdictUnit::Safety => factor_required(value),
        other => verdict_value(value, other, system),
    }
}

fn answers(out: &mut String, findings: &Findings) {
    line(out, "");
    let mut last = None;
    for verdict in &findings.verdicts {
        let name = if last == Some(verdict.question) { "" } else { question_name(verdict.question) };
        last = Some(verdict.question);
        let (style, word) = match (verdict.ok, verdict.required) {
            (true, Some(_)) => (GOOD, "met"),
            (true, None) => (HEADING, "-"),
            (false, _) => (BAD, "NOT MET"),
        };
        let sentence = verdict_sentence(verdict, findings.joint.display);
        let indent = format!("{:10}{:9}", name.to_uppercase(), word);
        let hang = " ".repeat(indent.chars().count());
        let options = textwrap::Options::new(WIDTH).initial_indent(&indent).subsequent_indent(&hang);
        for (index, wrapped) in textwrap::wrap(&sentence, options).into_iter().enumerate() {
            if index == 0 {
                let rest: String = wrapped.chars().skip(19).collect();
                line(
                    out,
                    format!("{HEADING}{:10}{HEADING:#}{style}{word:9}{style:#}{rest}", name.to_uppercase()),
                );
            } else {
                line(out, wrapped);
            }
        }
    }
}

/// One verdict as a sentence without its word met or NOT MET.
pub fn verdict_sentence(verdict: &Verdict, system: UnitSystem) -> String {
    let value = |number| verdict_value(number, verdict.unit, system);
    let found = verdict.found.map_or_else(|| "does not exist".to_owned(), value);
    let bound = match verdict.unit {
        VerdictUnit::Safety | VerdictUnit::Time => "at least",
        VerdictUnit::Force | VerdictUnit::Share => "at most",
        VerdictUnit::Temperature => "limit",
    };
    let required = verdict.required.map_or_else(String::new, |number| {
        format!(" ({bound} {})", verdict_required(number, verdict.unit, system))
    });
    format!("{} {found}{required}; {}", verdict.subject, verdict.at)
}

pub(super) fn table(header: &[String]) -> Table {
    let mut table = Table::new();
    table.load_style(presets::NOTHING).set_header(header.to_vec());
    table
}

/// A table whose columns from `numbers` on are right-aligned.
pub(super) fn print_table(out: &mut String, mut table: Table, numbers: usize) {
    for (index, column) in table.column_iter_mut().enumerate() {
        column.set_padding((if index == 0 { 0 } else { 1 }, 1));
        if index >= numbers {
            column.set_cell_alignment(CellAlignment::Right);
        }
    }
    for row in table.lines() {
        line(out, row);
    }
}

/// What the seat does to a bearing.
fn bearing(out: &mut String, findings: &Findings) {
    let Some(title) = bearing::title(findings) else { return };
    heading(out, "Bearing");
    paragraph(out, "", &title);
    for row in bearing::rows(findings) {
        let note = if row.note.is_empty() { String::new() } else { format!("; {}", row.note) };
        paragraph(out, "- ", &plain(&format!("{}: {}{note}", row.name, row.value)));
    }
}

fn extremes(out: &mut String, findings: &Findings) {
    heading(out, "Extreme pairs, shop temperature, at rest");
    let mut table = table(&["", "loosest", "mean", "tightest"].map(str::to_owned));
    for (name, values) in extreme_rows(findings) {
        let cell = |value: Option<String>| value.unwrap_or_else(|| "-".to_owned());
        table.add_row(vec![name, cell(values.loosest), cell(values.mean), cell(values.tightest)]);
    }
    print_table(out, table, 1);
}

/// The rows of the table of extremes, ready to print: name with unit, and three numbers.
pub fn extreme_rows(findings: &Findings) -> Vec<(String, Extremes<Option<String>>)> {
    let joint = &findings.joint;
    let system = joint.display;
    let measured = |name: &str,
                    measure: Measure,
                    value: fn(&PairFindings) -> f64|
     -> (String, Extremes<Option<String>>) {
        let unit = display_unit(measure, system).name;
        (
            format!("{name}, {unit}"),
            findings.extremes.as_ref().map(|pair| Some(show(measure, value(pair), system).number)),
        )
    };
    // With several fits, these are those of the fit that is joined last.
    let last =
        if joint.fits.len() > 1 { format!(", fit {}", joint.last_interface() + 1) } else { String::new() };
    let of_last = |name: &str, measure: Measure, value: fn(&PairFindings) -> f64| {
        measured(&format!("{name}{last}"), measure, value)
    };
    let mut rows = vec![
        of_last("interference", Measure::Deviation, |pair| pair.interference),
        of_last("lost by smoothing", Measure::Deviation, |pair| pair.smoothing),
        of_last("interference that grips", Measure::Deviation, |pair| pair.effective_interference),
    ];
    if joint.assembly.shop_temperature != REFERENCE_TEMPERATURE {
        rows.push(measured("  in the shop", Measure::Deviation, |pair| pair.shop_interference));
    }
    rows.extend([
        of_last("contact pressure", Measure::Pressure, |pair| pair.pressure),
        measured("  with the loss", Measure::Pressure, |pair| pair.pressure_smoothed),
        measured("  without the loss", Measure::Pressure, |pair| pair.pressure_unsmoothed),
    ]);
    for (index, ring) in joint.rings.iter().enumerate() {
        let unit = display_unit(Measure::Pressure, system).name;
        let cell = |pair: &PairFindings, value: fn(&crate::findings::RingStress) -> f64| {
            pair.rings.get(index).map(|stress| show(Measure::Pressure, value(stress), system).number)
        };
        let solid = joint.is_solid(index);
        let place = if solid { "everywhere" } else { "at the bore" };
        rows.push((
            format!("{} hoop stress {place}, {unit}", ring.name),
            findings.extremes.as_ref().map(|pair| cell(pair, |stress| stress.bore.hoop)),
        ));
        rows.push((
            format!("{} equivalent stress, {unit}", ring.name),
            findings.extremes.as_ref().map(|pair| cell(pair, |stress| stress.equivalent)),
        ));
        rows.push((
            format!("{} safety against {}", ring.name, crate::findings::failure(ring)),
            findings
                .extremes
                .as_ref()
                .map(|pair| pair.rings.get(index).and_then(|stress| stress.safety).map(factor_found)),
        ));
    }
    let least = if joint.fits.len() > 1 { ", least" } else { "" };
    rows.push(measured(&format!("torque at slip{least}"), Measure::Torque, |pair| pair.torque_capacity));
    rows.push(measured(&format!("axial force at slip{least}"), Measure::Force, |pair| pair.axial_capacity));
    rows.push(of_last("peak press-in force", Measure::Force, |pair| pair.press_force.high));
    rows.push(of_last("release force", Measure::Force, |pair| pair.release_force.high));
    rows
}

fn duty(out: &mut String, findings: &Findings) {
    let joint = &findings.joint;
    let system = joint.display;
    heading(out, "Duty states");
    let unit = |measure| display_unit(measure, system).name;
    let mut table = table(&[
        "state".to_owned(),
        "pair".to_owned(),
        unit(Measure::Pressure).to_owned(),
        format!("torque {}", unit(Measure::Torque)),
        format!("axial {}", unit(Measure::Force)),
        "slip".to_owned(),
        "strength".to_owned(),
    ]);
    for (state, duty) in joint.duty.iter().zip(&findings.duty) {
        for (pair, found) in [("loosest", &duty.loosest), ("tightest", &duty.tightest)] {
            let least = found.rings.iter().filter_map(|stress| stress.safety).min_by(f64::total_cmp);
            let name = if pair == "loosest" { plain(&state.name) } else { String::new() };
            table.add_row(vec![
                name,
                pair.to_owned(),
                show(Measure::Pressure, found.pressure, system).number,
                show(Measure::Torque, found.torque_capacity, system).number,
                show(Measure::Force, found.axial_capacity, system).number,
                found.slip_safety.map_or_else(|| "-".to_owned(), factor_found),
                least.map_or_else(|| "-".to_owned(), factor_found),
            ]);
        }
    }
    print_table(out, table, 2);
}

/// Interfaces of several rings, slices, what loosens the joint, yielding by design, bending and fatigue.
fn service(out: &mut String, findings: &Findings) {
    interfaces(out, findings);
    slices(out, findings);
    heading(out, "At work");
    for sentence in super::service::sentences(findings) {
        paragraph(out, "  ", &sentence);
    }
}

fn interfaces(out: &mut String, findings: &Findings) {
    let joint = &findings.joint;
    if joint.rings.len() == 2 {
        return;
    }
    heading(out, "Interfaces, shop temperature, at rest");
    let unit = |measure| display_unit(measure, joint.display).name;
    let mut table = table(&[
        "interface".to_owned(),
        "between".to_owned(),
        format!("loosest {}", unit(Measure::Pressure)),
        "mean".to_owned(),
        "tightest".to_owned(),
    ]);
    for index in 0..joint.fits.len() {
        let names = joint.rings.get(index..index + 2).unwrap_or_default();
        let between: Vec<&str> = names.iter().map(|ring| ring.name.as_str()).collect();
        let pressure = |pair: &PairFindings| {
            pair.interfaces.get(index).map_or_else(String::new, |interface| {
                if interface.open {
                    "open".to_owned()
                } else {
                    show(Measure::Pressure, interface.pressure, joint.display).number
                }
            })
        };
        table.add_row(vec![
            (index + 1).to_string(),
            plain(&between.join(" / ")),
            pressure(&findings.extremes.loosest),
            pressure(&findings.extremes.mean),
            pressure(&findings.extremes.tightest),
        ]);
    }
    print_table(out, table, 2);
}

fn slices(out: &mut String, findings: &Findings) {
    let joint = &findings.joint;
    if joint.slices.is_empty() {
        return;
    }
    heading(out, "Along the joint: a slice is good to 10 to 15 %, the total to a few percent");
    let size = display_unit(Measure::Size, joint.display).name;
    let pressure = display_unit(Measure::Pressure, joint.display).name;
    let mut table = table(&[
        format!("length {size}"),
        format!("outer {size}"),
        format!("bore {size}"),
        format!("loosest {pressure}"),
        format!("tightest {pressure}"),
    ]);
    for (loosest, tightest) in findings.extremes.loosest.slices.iter().zip(&findings.extremes.tightest.slices)
    {
        let size = |metres| show(Measure::Size, metres, joint.display).number;
        let pressure = |pascals| show(Measure::Pressure, pascals, joint.display).number;
        table.add_row(vec![
            size(loosest.length),
            size(loosest.hub_outer_diameter),
            size(loosest.shaft_bore),
            pressure(loosest.pressure),
            pressure(tightest.pressure),
        ]);
    }
    print_table(out, table, 0);
}

fn defaults(out: &mut String, findings: &Findings) {
    if findings.joint.defaults.is_empty() {
        return;
    }
    heading(out, "Defaults taken");
    for default in &findings.joint.defaults {
        paragraph(out, "  ", &format!("{}: {} ({})", default.key, default.value, default.source));
    }
}

fn cautions(out: &mut String, findings: &Findings) {
    if findings.cautions.is_empty() {
        return;
    }
    heading(out, "Cautions");
    for caution in &findings.cautions {
        paragraph(out, "! ", &caution.text);
    }
}

fn notes(out: &mut String, findings: &Findings) {
    heading(out, "Notes");
    for note in &findings.notes {
        paragraph(out, "  ", note);
    }
}
