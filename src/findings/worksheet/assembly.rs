//! Press force and joining temperature.

use super::super::Findings;
use super::super::expression::{Function, num, sym};
use super::Units;
use super::sheet::Sheet;
use crate::assembly::oil::{OIL_PLANNED, OIL_SOURCE};
use crate::assembly::press::PRESS_MARGIN;
use crate::assembly::press_practice::{METRIC_TON_FORCE, US_TON_FORCE};
use crate::joint::Method;
use crate::material::{Material, REFERENCE_TEMPERATURE};

const EQUILIBRIUM: &str = "equilibrium of the seat and the lead-in chamfer";
const JOINING: &str = "clearance of both expanded diameters";

pub(super) fn write(sheet: &mut Sheet, findings: &Findings, units: &Units) {
    press(sheet, findings, units);
    let joint = &findings.joint;
    let shop = joint.assembly.shop_temperature;
    let alone = findings.assembly.heat_hub.temperature;
    match joint.assembly.method {
        Method::HeatHub => heat(sheet, findings, units, ("", shop, alone)),
        Method::HeatAndChill => {
            let bath = findings.assembly.baths.iter().find(|bath| bath.bath == joint.assembly.bath);
            if let Some(bath) = bath {
                heat(sheet, findings, units, ("", bath.temperature, bath.hub_temperature));
            }
        }
        Method::Press | Method::ChillShaft => {}
    }
    // What is mounted warm by its maker's advice is told the temperature whatever the method.
    if joint.bearing.is_some() && joint.assembly.method != Method::HeatHub {
        heat(sheet, findings, units, ("B", shop, alone));
    }
    super::cold_bath::write(sheet, findings);
    super::frost::write(sheet, findings);
    oil(sheet, findings, units);
}

/// Oil injection: the pressure at both extremes, the film, the stress it makes.
fn oil(sheet: &mut Sheet, findings: &Findings, units: &Units) {
    let Some(found) = &findings.assembly.oil else { return };
    let yields = super::strength::hub_yields(findings);
    let contact = |tag: &str| format!("{}_{tag}", if yields { "P" } else { "p" });
    sheet.section("Oil injection, shop temperature, at rest");
    sheet.input("k_o", "oil pressure over contact pressure that is planned", OIL_PLANNED, "", OIL_SOURCE);
    let pairs = [("min", "loosest", found.loosest.as_ref()), ("max", "tightest", Some(&found.tightest))];
    for (tag, name, pair) in pairs {
        let Some(pair) = pair else { continue };
        sheet.formula(
            &format!("p_o{tag}"),
            &format!("oil pressure that floats the hub, {name} pair; {} is the least", contact(tag)),
            sym("k_o") * sym(&contact(tag)),
            units.pressure,
            "equilibrium of the film with both parts",
            Some(pair.planned * units.per_pascal),
        );
    }
    let tight = &found.tightest;
    sheet.formula(
        "delta_o",
        "the seats then part on the diameter by, tightest pair",
        num("1000") * (sym("p_omax") - sym(&contact("max"))) * super::strength::flexibility("E_h", "E_s"),
        units.small,
        "Lamé, with the oil pressure in place of the contact pressure",
        Some(tight.film * units.small_per_metre),
    );
    for (index, name, safety, limit) in [
        ("h", "hub", tight.hub_safety, tight.hub_limit),
        ("s", "shaft", tight.shaft_safety, tight.shaft_limit),
    ] {
        let (Some(safety), Some(limit)) = (safety, limit) else { continue };
        let known = format!("S_{index}");
        if !sheet.has(&known) {
            continue;
        }
        sheet.formula(
            &format!("S_o{index}"),
            &format!("safety of the {name} at that oil pressure, tightest pair"),
            sym(&known) * sym(&contact("max")) / sym("p_omax"),
            "",
            "the stress is proportional to the pressure on the seat",
            Some(safety),
        );
        sheet.formula(
            &format!("p_o{index}"),
            &format!("oil pressure at which the {name} reaches its strength"),
            sym(&format!("S_o{index}")) * sym("p_omax"),
            units.pressure,
            "the stress is proportional to the pressure on the seat",
            Some(limit * units.per_pascal),
        );
    }
}

fn press(sheet: &mut Sheet, findings: &Findings, units: &Units) {
    let joint = &findings.joint;
    let curve = &findings.assembly.press.tightest;
    if curve.peak_force <= 0.0 {
        return;
    }
    sheet.section("Peak press-in force at the tightest pair");
    sheet.input(
        "mu_p",
        "friction while pressing, high end",
        joint.friction.pressing.value.high,
        "",
        &joint.friction.pressing.source,
    );
    sheet.input(
        "phi",
        "half-angle of the lead-in chamfer",
        joint.assembly.chamfer_angle.value,
        "rad",
        &joint.assembly.chamfer_angle.source,
    );
    let tan = || sym("phi").call(Function::Tan);
    sheet.formula(
        "c",
        "length of chamfer that meets the bore",
        super::strength::grip("W_max", "eps_s", "eps_h") / (num("2") * tan()),
        units.length,
        "overlap at the shop temperature over the slope of the chamfer",
        Some(curve.lead_in * units.per_metre),
    );
    sheet.formula(
        "K",
        "wedge factor of the chamfer",
        (sym("mu_p") + tan()) / (num("1") - sym("mu_p") * tan()),
        "",
        EQUILIBRIUM,
        None,
    );
    sheet.formula(
        "s_peak",
        "travel at the peak",
        sym("l") + sym("c") * sym("mu_p") / sym("K"),
        units.length,
        EQUILIBRIUM,
        Some(curve.peak_travel * units.per_metre),
    );
    let pressure = if super::strength::hub_yields(findings) { "P_max" } else { "p_max" };
    let leaving =
        sym("K") * (sym("c").power(2) - (sym("s_peak") - sym("l")).power(2)) / (num("2") * sym("c"));
    let seat = sym("mu_p") * (sym("s_peak") - sym("c"));
    sheet.formula(
        "F_peak",
        "peak press-in force",
        sym("pi") * sym("d") * sym(pressure) * (leaving + seat),
        units.force,
        EQUILIBRIUM,
        Some(curve.peak_force * units.per_newton),
    );
    press_size(sheet, units, curve.peak_force);
}

/// The least press with its margin, in the force of the sheet and in tons.
fn press_size(sheet: &mut Sheet, units: &Units, peak: f64) {
    const MARGIN: &str = "a quarter above the peak (common practice, no source)";
    let least = peak * PRESS_MARGIN;
    sheet.formula(
        "F_press",
        "least press",
        num("1.25") * sym("F_peak"),
        units.force,
        MARGIN,
        Some(least * units.per_newton),
    );
    let (metric, us) = match units.force {
        "N" => ("9806.65", "8896.443230521"),
        _ => ("2204.62262184878", "2000"),
    };
    let tons = |sheet: &mut Sheet, symbol: &str, meaning: &str, size: &str, program: f64| {
        let formula = sym("F_press") / num(size);
        sheet.formula(
            symbol,
            meaning,
            formula,
            "",
            "1000 kg or 2000 lb under standard gravity",
            Some(program),
        );
    };
    tons(sheet, "t_press", "the same in metric tons-force", metric, least / METRIC_TON_FORCE);
    tons(sheet, "st_press", "the same in US tons-force", us, least / US_TON_FORCE);
}

/// Hub temperature for the tightest pair; the mean coefficients are read from the curves.
///
/// With it come a tag for its symbols, the temperature of the shaft and the one that was found for the hub, K.
fn heat(
    sheet: &mut Sheet,
    findings: &Findings,
    units: &Units,
    (tag, shaft_temperature, hub_temperature): (&str, f64, Option<f64>),
) {
    let joint = &findings.joint;
    let (Some(shaft), Some(hub)) = (joint.rings.first(), joint.rings.last()) else { return };
    let Some(hub_temperature) = hub_temperature else { return };
    let name = |symbol: &str| format!("{symbol}{tag}");
    sheet.section(if tag.is_empty() {
        "Hub temperature for the tightest pair".to_owned()
    } else {
        format!("Temperature of the {} if it were mounted warm, tightest pair", hub.name)
    });
    if !sheet.has("j") {
        sheet.input(
            "j",
            "clearance while joining",
            findings.assembly.clearance * units.small_per_metre,
            units.small,
            &joint.assembly.clearance.source,
        );
    }
    sheet.input(
        &name("T_sj"),
        "temperature of the shaft",
        units.degrees(shaft_temperature),
        units.temperature,
        "method of assembly",
    );
    let Ok(shaft_strain) = shaft.material.expansion.strain(shaft_temperature) else { return };
    sheet.input(
        &name("eps_sj"),
        "expansion of the shaft from 20 °C",
        shaft_strain,
        "",
        &shaft.material.expansion.source,
    );
    let thousand = || num("1000");
    sheet.formula(
        &name("eps_hj"),
        "expansion that the hub needs",
        ((sym("j") + sym("U_max")) / thousand()
            + (sym("d") + sym("U_max") / thousand()) * sym(&name("eps_sj")))
            / sym("d"),
        "",
        JOINING,
        hub.material.expansion.strain(hub_temperature).ok(),
    );
    let Some(alpha) = mean_coefficient(&hub.material, hub_temperature, units) else { return };
    let unit = if units.temperature == "degC" { "1/K" } else { "1/degF" };
    let mean = if tag.is_empty() { "alpha".to_owned() } else { format!("alpha_{tag}") };
    sheet.input(
        &mean,
        "mean expansion of the hub from 20 °C to that temperature, from its curve",
        alpha,
        unit,
        &hub.material.expansion.source,
    );
    if !sheet.has("T_ref") {
        sheet.input(
            "T_ref",
            "reference temperature of sizes",
            units.degrees(REFERENCE_TEMPERATURE),
            units.temperature,
            "ISO 1",
        );
    }
    sheet.formula(
        &name("T_h"),
        "hub temperature for joining",
        sym("T_ref") + sym(&name("eps_hj")) / sym(&mean),
        units.temperature,
        JOINING,
        Some(units.degrees(hub_temperature)),
    );
}

/// Mean coefficient for each degree of the sheet's scale.
fn mean_coefficient(material: &Material, temperature: f64, units: &Units) -> Option<f64> {
    let per_kelvin = material.expansion.mean_coefficient(temperature).ok()?;
    Some(if units.temperature == "degC" { per_kelvin } else { per_kelvin / 1.8 })
}
