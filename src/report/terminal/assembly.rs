//! How the joint is put together and taken apart.

use super::{HEADING, WIDTH, heading, line, paragraph, plain};
use crate::findings::Findings;
use crate::joint::Method;
use crate::quantity::{Measure, show};
use crate::report::seating;

/// The headline, every way to join, and what the one asked for takes.
pub(super) fn write(out: &mut String, findings: &Findings) {
    let joint = &findings.joint;
    let system = joint.display;
    let assembly = &findings.assembly;
    heading(out, "Assembly");
    let force = |value| show(Measure::Force, value, system).to_string();
    let chosen = |is: bool| if is { "* " } else { "  " };
    let method = joint.assembly.method;
    let press = &assembly.press;
    if let Some(text) = seating::headline(findings) {
        for wrapped in textwrap::wrap(&text, WIDTH) {
            line(out, format!("{HEADING}{wrapped}{HEADING:#}"));
        }
    }
    paragraph(
        out,
        chosen(method == Method::Press),
        &format!(
            "press: peak {} (loosest pair, low friction) to {} (tightest pair, high friction); look for a press of {}",
            force(press.loosest.peak_force),
            force(press.tightest.peak_force),
            force(assembly.press_rating)
        ),
    );
    paragraph(out, chosen(method == Method::HeatHub), &assembly.heat_hub.statement);
    paragraph(out, chosen(method == Method::ChillShaft), &assembly.chill_shaft.statement);
    for bath in &assembly.baths {
        let is_chosen = method == Method::HeatAndChill && bath.bath == joint.assembly.bath;
        paragraph(out, chosen(is_chosen), &bath.statement);
    }
    paragraph(
        out,
        "  ",
        &format!(
            "thermal joining opens {} for the tightest pair, of which {} is clearance; * marks the chosen method",
            show(Measure::Deviation, assembly.needed, system),
            show(Measure::Deviation, assembly.clearance, system)
        ),
    );
    for sentence in method_sentences(findings) {
        paragraph(out, "  ", &plain(&sentence));
    }
}

/// What the method asked for takes, and how the joint comes apart.
fn method_sentences(findings: &Findings) -> Vec<String> {
    let mut all: Vec<String> = seating::handling(findings).into_iter().collect();
    all.extend(seating::soaks(findings));
    all.extend(seating::cold_bath(findings));
    all.extend(seating::coefficients(findings));
    if findings.joint.assembly.method == Method::Press {
        all.extend(seating::press(findings));
    }
    all.extend(seating::release(findings));
    all
}
