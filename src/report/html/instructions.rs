//! What the fitter does, step by step, with the cautions beside the step they belong to.

use maud::{Markup, html};

use super::Sheet;
use super::table::range_text;
use crate::findings::{BathFindings, Caution, bath_name};
use crate::joint::{Method, Ring};
use crate::material::{REFERENCE_TEMPERATURE, Range};
use crate::report::seating;
use crate::report::typeset::{prose, sentence};
use crate::report::units::Measure;

/// One step.
struct Step {
    title: String,
    text: String,
    /// What there is to know of it, a full sentence each.
    details: Vec<String>,
    /// Subject of the cautions that belong to it.
    cautions: Option<&'static str>,
}

impl Step {
    fn new(title: impl Into<String>, text: impl Into<String>) -> Self {
        Self { title: title.into(), text: text.into(), details: Vec::new(), cautions: None }
    }

    fn with_details(mut self, details: Vec<String>) -> Self {
        self.details = details;
        self
    }

    fn with_cautions(mut self, subject: &'static str) -> Self {
        self.cautions = Some(subject);
        self
    }
}

/// The numbered steps of the method asked for.
pub(super) fn body(sheet: Sheet) -> Markup {
    let method = sheet.findings.joint.assembly.method;
    let mut steps = vec![check_parts(sheet), clean(sheet)];
    match method {
        Method::Press => steps.extend(press(sheet)),
        Method::HeatHub => steps.extend(heat(sheet)),
        Method::ChillShaft => steps.extend(chill(sheet)),
        Method::HeatAndChill => steps.extend(heat_and_chill(sheet)),
    }
    steps.push(dismantle(sheet));
    html! {
        @if let Some(headline) = seating::headline(sheet.findings) { p.verdict { (prose(&headline)) } }
        p {
            "Method: " strong { (super::inputs::method(method)) }
            ". All figures are for the tightest pair, unless the step says otherwise."
            @if sheet.findings.joint.fits.len() > 1 { " " (order(sheet)) }
        }
        ol.steps {
            @for step in &steps {
                li {
                    strong { (step.title) "." } " " (step.text)
                    @if !step.details.is_empty() {
                        ul { @for detail in &step.details { li { (prose(detail)) } } }
                    }
                    @if let Some(subject) = step.cautions { (cautions(&sheet.findings.cautions, subject)) }
                }
            }
        }
        (other_routes(sheet))
    }
}

fn cautions(all: &[Caution], subject: &str) -> Markup {
    html! {
        @if all.iter().any(|caution| caution.subject == subject) {
            p.caution-head { strong { "Cautions" } }
            ul.cautions {
                @for caution in all.iter().filter(|caution| caution.subject == subject) {
                    li { (prose(&caution.text)) " " span.source { (caution.source) } }
                }
            }
        }
    }
}

/// Names of the two parts that are joined last, the inner one first.
pub(super) fn names<'a>(sheet: Sheet<'a>) -> (&'a str, &'a str) {
    let (inner, outer) = sheet.findings.joint.joined_last();
    (&inner.name, &outer.name)
}

/// In which order several rings are joined.
fn order(sheet: Sheet) -> String {
    let joint = &sheet.findings.joint;
    let name = |ring: usize| joint.rings.get(ring).map_or("", |ring| ring.name.as_str());
    let steps: Vec<String> = joint
        .order
        .iter()
        .map(|interface| format!("the {} into the {}", name(*interface), name(interface + 1)))
        .collect();
    let (inner, outer) = names(sheet);
    let last = joint.last_interface();
    let with = |joined: bool, name: &str| {
        if joined { format!("the {name} with all that it is joined to") } else { format!("the {name}") }
    };
    let mut text = format!(
        "Join in this order: {}. The steps below are for the last of them: {} into {}.",
        steps.join(", then "),
        with(last > 0, inner),
        with(last + 2 < joint.rings.len(), outer)
    );
    for earlier in &sheet.findings.assembly.earlier {
        let outer = name(earlier.interface + 1);
        let force = sheet.units.brief(Measure::Force, earlier.press_force).text();
        let heat = match earlier.hub_temperature {
            Some(hot) => {
                format!("with the {outer} heated to {}", sheet.units.text(Measure::Temperature, hot))
            }
            None => format!("heating the {outer} alone does not clear"),
        };
        text.push_str(&format!(
            " Before, the {} goes into the {outer} with up to {force}, or {heat} (tightest pair).",
            name(earlier.interface)
        ));
    }
    text
}

fn check_parts(sheet: Sheet) -> Step {
    let joint = &sheet.findings.joint;
    let mut sentences = Vec::new();
    for (index, fit) in joint.fits.iter().enumerate() {
        let size = |deviation: f64| sheet.units.text(Measure::Limit, fit.limits.nominal + deviation);
        let name = |ring: Option<&Ring>, other: &str| {
            ring.map_or_else(|| other.to_owned(), |ring| ring.name.clone())
        };
        let (inner, outer) = (name(joint.rings.get(index), "shaft"), name(joint.rings.get(index + 1), "hub"));
        sentences.push(format!(
            "Bore of the {outer}: {} to {}; {inner}: {} to {}.",
            size(fit.limits.hole.lower),
            size(fit.limits.hole.upper),
            size(fit.limits.shaft.lower),
            size(fit.limits.shaft.upper)
        ));
    }
    let (title, before) = if joint.fits.len() > 1 {
        ("Measure the parts", ", before the first is joined")
    } else {
        ("Measure both parts", "")
    };
    Step::new(
        title,
        format!(
            "At {}{before}. {} Parts outside these limits are not covered by this sheet.",
            sheet.units.text(Measure::Temperature, REFERENCE_TEMPERATURE),
            sentences.join(" ")
        ),
    )
}

fn clean(sheet: Sheet) -> Step {
    let angle = &sheet.findings.joint.assembly.chamfer_angle;
    Step::new(
        "Clean and deburr both seats",
        format!(
            "The lead-in chamfer has a half-angle of {} ({}). Mark the axial position to be reached.",
            sheet.units.text(Measure::Angle, angle.value),
            angle.source
        ),
    )
}

fn press(sheet: Sheet) -> Vec<Step> {
    let findings = sheet.findings;
    let units = sheet.units;
    let force = |value: f64| units.brief(Measure::Force, value).text();
    let press = &findings.assembly.press;
    let friction = &findings.joint.friction.pressing;
    let seated = if press.loosest.peak_force > 0.0 {
        format!("lie between {} and {}", force(press.loosest.final_force), force(press.tightest.final_force))
    } else {
        format!("be at most {}; the loosest pair slides in without force", force(press.tightest.final_force))
    };
    vec![
        Step::new(
            "Lubricate as the friction assumes",
            format!(
                "The forces hold for a coefficient of {} ({}).",
                range_text(units, Measure::Number, friction.value),
                friction.source
            ),
        ),
        Step::new(
            "Set up the press",
            format!(
                "Rating at least {}. Line up shaft and bore; the force must act along the axis.",
                force(findings.assembly.press_rating)
            ),
        )
        .with_details(seating::press(findings)),
        Step::new(
            "Press in with one stroke",
            format!(
                "Over {} of seat, from first touch. The force rises steadily. Stop when it passes {}: parts or friction are then not as assumed.",
                units.text(Measure::Size, findings.joint.engaged_length()),
                force(press.tightest.peak_force)
            ),
        )
        .with_cautions("press"),
        Step::new("Record the force when seated", format!("It must {seated}.")),
    ]
}

/// Smallest bore and largest shaft at the surface that is joined, m, with the clearance wanted.
fn gauge(sheet: Sheet) -> (f64, f64) {
    let joint = &sheet.findings.joint;
    let shop = joint.assembly.shop_temperature;
    let clearance = sheet.findings.assembly.clearance;
    let at_shop = |ring: &Ring, size: f64| size * (1.0 + ring.material.expansion.strain(shop).unwrap_or(0.0));
    let last = joint.last_interface();
    let Some(fit) = joint.fits.get(last) else { return (0.0, 0.0) };
    let (shaft, hub) = joint.joined_last();
    // What was joined before has strained the parts.
    if let [.., before, _] = sheet.findings.service.steps.as_slice()
        && let (Some(inner), Some(outer)) = (before.rings.get(last), before.rings.get(last + 1))
    {
        let bore = fit.limits.nominal + fit.limits.hole.lower + outer.bore_change;
        let pin = fit.limits.nominal + fit.limits.shaft.upper + inner.outer_change;
        return (pin + clearance, bore - clearance);
    }
    let bore = at_shop(hub, fit.limits.nominal + fit.limits.hole.lower);
    let pin = at_shop(shaft, fit.limits.nominal + fit.limits.shaft.upper);
    (pin + clearance, bore - clearance)
}

fn heat(sheet: Sheet) -> Vec<Step> {
    let route = &sheet.findings.assembly.heat_hub;
    let Some(hot) = route.temperature.filter(|_| route.possible) else {
        return vec![impossible(&route.statement, "heat")];
    };
    let bore = sheet.units.text(Measure::Limit, gauge(sheet).0);
    vec![
        heat_to(sheet, hot),
        Step::new(
            format!("Check the bore of the {} hot", names(sheet).1),
            format!("It must measure at least {bore} before the parts are joined."),
        ),
        join(sheet),
        cool(),
    ]
}

fn heat_to(sheet: Sheet, hot: f64) -> Step {
    let temperature = |value: f64| sheet.units.text(Measure::Temperature, value);
    let limit = sheet
        .findings
        .assembly
        .hub_limit
        .as_ref()
        .map(|(limit, reason)| format!(" Never above {} ({reason}).", temperature(*limit)))
        .unwrap_or_default();
    Step::new(
        format!("Heat the {}", names(sheet).1),
        format!("To {} right through, evenly.{limit}", temperature(hot)),
    )
    .with_details(heating_details(sheet))
    .with_cautions("heat")
}

/// Soak of the hub, and what one coefficient would have said.
fn heating_details(sheet: Sheet) -> Vec<String> {
    let findings = sheet.findings;
    let soak = findings.assembly.times.hub.as_ref();
    let mut details: Vec<String> = soak.map(|soak| seating::soak_of(findings, soak)).into_iter().collect();
    details.extend(seating::coefficients(findings));
    details
}

/// Chill of the shaft, what it takes and what it does to the air.
fn chilling_details(sheet: Sheet) -> Vec<String> {
    let findings = sheet.findings;
    let soak = findings.assembly.times.shaft.as_ref();
    let mut details: Vec<String> = soak.map(|soak| seating::soak_of(findings, soak)).into_iter().collect();
    details.extend(seating::cold_bath(findings));
    if !findings.joint.assembly.heats() || findings.assembly.times.hub.is_none() {
        details.extend(seating::coefficients(findings));
    }
    details
}

fn join(sheet: Sheet) -> Step {
    let mut details: Vec<String> = seating::headline(sheet.findings).into_iter().collect();
    details.extend(seating::handling(sheet.findings));
    details.extend(sheet.findings.assembly.times.gaps.iter().cloned());
    Step::new(
        "Join in one movement",
        "Slip the parts together to the mark without stopping and hold them there until they grip. They seize as soon as the temperatures draw near each other: have everything ready before.",
    )
    .with_details(details)
}

fn cool() -> Step {
    Step::new("Let the joint come to shop temperature", "In still air. Then check the axial position.")
}

fn chill(sheet: Sheet) -> Vec<Step> {
    let findings = sheet.findings;
    let route = &findings.assembly.chill_shaft;
    let Some(cold) = route.temperature.filter(|_| route.possible) else {
        return vec![impossible(&route.statement, "cold")];
    };
    let pin = sheet.units.text(Measure::Limit, gauge(sheet).1);
    let temperature = |value: f64| sheet.units.text(Measure::Temperature, value);
    let bath = findings.assembly.baths.iter().filter(|bath| bath.alone).map(|bath| bath.bath);
    let baths: Vec<&str> = bath.map(bath_name).collect();
    let how = if baths.is_empty() {
        String::new()
    } else {
        format!(" {} is cold enough.", super::capital(&baths.join(" or ")))
    };
    vec![
        Step::new(
            format!("Chill the {}", names(sheet).0),
            format!("To {} or below, right through.{how}", temperature(cold)),
        )
        .with_details(chilling_details(sheet))
        .with_cautions("cold"),
        Step::new(
            format!("Check the {} cold", names(sheet).0),
            format!("It must measure at most {pin} before the parts are joined."),
        ),
        join(sheet),
        cool(),
    ]
}

fn heat_and_chill(sheet: Sheet) -> Vec<Step> {
    let findings = sheet.findings;
    let wanted = findings.joint.assembly.bath;
    let bath: Option<&BathFindings> = findings.assembly.baths.iter().find(|bath| bath.bath == wanted);
    let Some((bath, hot)) = bath.and_then(|bath| bath.hub_temperature.map(|hot| (bath, hot))) else {
        return vec![impossible(bath.map_or("The bath is not covered.", |bath| &bath.statement), "cold")];
    };
    let shrinkage = bath.shrinkage.map_or_else(String::new, |value| {
        format!(" It shrinks by {}.", sheet.units.text(Measure::Deviation, value))
    });
    let mut steps = vec![
        Step::new(
            format!("Chill the {}", names(sheet).0),
            format!(
                "In {} to {}, right through.{shrinkage}",
                bath_name(bath.bath),
                sheet.units.text(Measure::Temperature, bath.temperature)
            ),
        )
        .with_details(chilling_details(sheet))
        .with_cautions("cold"),
    ];
    if !bath.alone {
        steps.push(heat_to(sheet, hot));
    }
    steps.extend([join(sheet), cool()]);
    steps
}

fn impossible(statement: &str, subject: &'static str) -> Step {
    Step::new("NOT POSSIBLE as asked", sentence(statement)).with_cautions(subject)
}

fn dismantle(sheet: Sheet) -> Step {
    let extremes = &sheet.findings.extremes;
    let range = Range { low: extremes.loosest.release_force.low, high: extremes.tightest.release_force.high };
    let force = |value: f64| sheet.units.brief(Measure::Force, value).text();
    Step::new(
        "To take it apart",
        match range.low {
            low if low > 0.0 => format!(
                "Pushing out takes {} to {}, the least at the loosest pair and the low friction.",
                force(low),
                force(range.high)
            ),
            _ => format!("Pushing out takes up to {}; the loosest pair does not grip.", force(range.high)),
        },
    )
    .with_details(seating::release(sheet.findings))
    .with_cautions("apart")
}

/// What the other methods would take, in the words of the findings.
fn other_routes(sheet: Sheet) -> Markup {
    let assembly = &sheet.findings.assembly;
    let plan = &sheet.findings.joint.assembly;
    let mut statements = Vec::new();
    if plan.method != Method::HeatHub {
        statements.push(&assembly.heat_hub.statement);
    }
    if plan.method != Method::ChillShaft {
        statements.push(&assembly.chill_shaft.statement);
    }
    let other =
        assembly.baths.iter().filter(|bath| plan.method != Method::HeatAndChill || bath.bath != plan.bath);
    statements.extend(other.map(|bath| &bath.statement));
    html! {
        h3 { "Other ways" }
        ul { @for statement in statements { li { (sentence(statement)) } } }
    }
}
