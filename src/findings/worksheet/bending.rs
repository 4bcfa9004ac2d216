//! Bending at the edges of the seat in each state, and what it leaves of the shaft's fatigue strength.

use super::super::expression::{Expression, Function, greatest, least, num, sym};
use super::super::fatigue::{Fatigue, PLAIN_SHARE, TESTED_DIAMETER, TESTED_NOTCH, bore_at_the_edges};
use super::super::{BendingFindings, Findings};
use super::Units;
use super::sheet::Sheet;
use crate::joint::DutyState;
use crate::mechanics::{fatigue, notch};
use crate::quantity::number;

const EQUILIBRIUM: &str = "equilibrium of a pressure linear along the seat, cosine round it";
const NOTCH: &str = "DIN 743-2, press fit, plain edge, 40 mm (from memory)";
const SIZE: &str = "DIN 743-2, size factors (from memory)";

pub(super) fn write(sheet: &mut Sheet, findings: &Findings, units: &Units) {
    let joint = &findings.joint;
    let plain = joint.rings.len() == 2 && joint.slices.is_empty();
    for (index, (state, duty)) in joint.duty.iter().zip(&findings.duty).enumerate() {
        let (Some(loosest), Some(tightest)) = (&duty.loosest.bending, &duty.tightest.bending) else {
            continue;
        };
        sheet.section(format!("Duty {}: bending at the edges of the seat", state.called()));
        seat(sheet, findings, units);
        let tag = index + 1;
        let name = |symbol: &str| format!("{symbol}{tag}");
        let worked = plain && sheet.has(&name("p_"));
        let loosest_pressure = name(if worked { "p_" } else { "p_a" });
        if !worked {
            let pressure = loosest.least_edge + loosest.edge_change;
            input_pressure(sheet, units, &loosest_pressure, "loosest", pressure);
        }
        let tightest_pressure = name("p_b");
        let pressure = tightest.greatest_edge - tightest.edge_change;
        input_pressure(sheet, units, &tightest_pressure, "tightest", pressure);
        let pressures = [loosest_pressure.as_str(), &tightest_pressure];
        edges(sheet, units, &name, state, [loosest, tightest], pressures);
        let found = findings.service.fatigue.iter().find(|found| found.state == index);
        if let Some(found) = found {
            shaft(sheet, findings, units);
            life(sheet, units, &name, found);
        }
    }
}

/// A number of the formulas in the sheet's unit.
fn constant(value: f64) -> Expression {
    num(&number(value, 6))
}

/// Diameter and carrying length of the seat, unless the sheet has them already.
fn seat(sheet: &mut Sheet, findings: &Findings, units: &Units) {
    let joint = &findings.joint;
    for (symbol, meaning, metres, source) in [
        ("d", "diameter of the seat", joint.interface_diameter(joint.last_interface()), "joint file"),
        ("l", "length that carries", joint.engaged_length(), "length less relief"),
    ] {
        if !sheet.has(symbol) {
            sheet.input(symbol, meaning, metres * units.per_metre, units.length, source);
        }
    }
}

fn edges(
    sheet: &mut Sheet,
    units: &Units,
    name: &dyn Fn(&str) -> String,
    state: &DutyState,
    [loosest, tightest]: [&BendingFindings; 2],
    [loosest_pressure, tightest_pressure]: [&str; 2],
) {
    let (moment, force, change) = (name("M_b"), name("F_r"), name("Deltap_"));
    sheet.input(
        &moment,
        "bending moment",
        state.bending_moment * units.per_newton_metre,
        units.torque,
        "joint file",
    );
    sheet.input(&force, "radial force", state.radial_force * units.per_newton, units.force, "joint file");
    let squared = || sym("pi") * sym("d") * sym("l").power(2);
    let by_moment = num("12") * sym(&moment) * num(units.torque_divisor) / squared();
    let by_force = num("2") * sym(&force) / (sym("pi") * sym("d") * sym("l"));
    sheet.formula(
        &change,
        "change of pressure at the edges",
        by_moment + by_force.clone(),
        units.pressure,
        EQUILIBRIUM,
        Some(loosest.edge_change * units.per_pascal),
    );
    sheet.formula(
        &name("p_l"),
        "least pressure at an edge, loosest pair",
        sym(loosest_pressure) - sym(&change),
        units.pressure,
        EQUILIBRIUM,
        Some(loosest.least_edge * units.per_pascal),
    );
    sheet.formula(
        &name("p_g"),
        "greatest pressure at an edge, tightest pair",
        sym(tightest_pressure) + sym(&change),
        units.pressure,
        EQUILIBRIUM,
        Some(tightest.greatest_edge * units.per_pascal),
    );
    let left = greatest([num("0"), sym(loosest_pressure) - by_force]);
    sheet.formula(
        &name("M_g"),
        "bending moment at which an edge gapes, loosest pair",
        squared() / (num("12") * num(units.torque_divisor)) * left,
        units.torque,
        EQUILIBRIUM,
        Some(loosest.limiting_moment * units.per_newton_metre),
    );
}

fn input_pressure(sheet: &mut Sheet, units: &Units, symbol: &str, pair: &str, pressure: f64) {
    let meaning = format!("contact pressure at the edges in this state, {pair} pair");
    sheet.input(symbol, &meaning, pressure * units.per_pascal, units.pressure, "pressures in service");
}

/// What does not change from state to state: notch, size, surface; written once.
fn shaft(sheet: &mut Sheet, findings: &Findings, units: &Units) {
    if sheet.has("K_max") {
        return;
    }
    let (shaft, _) = findings.joint.shaft_and_hub();
    let Some(tensile) = shaft.strength.tensile_strength else { return };
    let Some(found) = findings.service.fatigue.first() else { return };
    let bore = bore_at_the_edges(&findings.joint) * units.per_metre;
    let outer = shaft.outer_diameter * units.per_metre;
    let name = &shaft.name;
    sheet.input("d_f", &format!("diameter of the {name}"), outer, units.length, "joint file");
    sheet.input("b_f", &format!("bore of the {name}"), bore, units.length, "joint file");
    if !sheet.has("R_ms") {
        let meaning = format!("tensile strength of the {name}");
        sheet.input("R_ms", &meaning, tensile * units.per_pascal, units.pressure, &shaft.strength.source);
    }
    if !sheet.has("Rz_s") {
        let roughness = shaft.roughness.value * units.small_per_metre;
        let meaning = format!("roughness of the {name}");
        sheet.input("Rz_s", &meaning, roughness, units.small, &shaft.roughness.source);
    }
    let length = |metres: f64| constant(metres * units.per_metre);
    let lg = |formula: Expression| formula.call(Function::Lg);
    let share = match shaft.outer_diameter {
        thin if thin <= fatigue::BAR_DIAMETER => num("0"),
        thick if thick >= fatigue::LARGE_DIAMETER => num("1"),
        _ => lg(sym("d_f") / length(fatigue::BAR_DIAMETER)) / lg(num("20")),
    };
    sheet.formula("s_f", "share that size counts with: lg(d/7.5 mm)/lg 20, 0 to 1", share, "", SIZE, None);
    sheet.formula(
        "K_2",
        "size factor",
        num("1") - num("0.2") * sym("s_f"),
        "",
        SIZE,
        Some(found.size_factor),
    );
    let surface = if shaft.roughness.value <= 1e-6 {
        num("1")
    } else {
        let rough = lg(sym("Rz_s") / constant(1e-6 * units.small_per_metre));
        num("1") - num("0.22") * rough * (lg(sym("R_ms") / constant(20e6 * units.per_pascal)) - num("1"))
    };
    let source = "DIN 743-2, surface factor (from memory)";
    sheet.formula("K_F", "surface factor", surface, "", source, Some(found.surface_factor));
    notches(sheet, units, found);
    for (symbol, meaning, notch, program) in [
        ("K_max", "greatest reduction of the strength", "beta_max", found.reduction.high),
        ("K_min", "least reduction of the strength", "beta_min", found.reduction.low),
    ] {
        let formula = sym(notch) / sym("K_2") + num("1") / sym("K_F") - num("1");
        sheet.formula(symbol, meaning, formula, "", "DIN 743-1 (from memory)", Some(program));
    }
    sheet.formula(
        "sigma_w",
        "strength of a small polished bar in rotating bending",
        constant(PLAIN_SHARE) * sym("R_ms"),
        units.pressure,
        "0.45 to 0.5 of the tensile strength is usual (from memory)",
        Some(found.plain_strength * units.per_pascal),
    );
}

/// The notch factors by formula and by test, carried over to the shaft's diameter.
fn notches(sheet: &mut Sheet, units: &Units, found: &Fatigue) {
    let share = |diameter: f64| {
        constant(
            (diameter / fatigue::BAR_DIAMETER).ln() / (fatigue::LARGE_DIAMETER / fatigue::BAR_DIAMETER).ln(),
        )
    };
    let carried = |factor: &dyn Fn() -> Expression, measured_at: f64| {
        let size = |share: Expression| num("1") - num("0.2") * factor().call(Function::Lg) * share;
        factor() * size(share(measured_at)) / size(sym("s_f"))
    };
    let tested = "Horger & Maulbetsch (1936), 2 in; carried over with DIN 743-2 (from memory)";
    for (symbol, meaning, factor) in [
        ("beta_u", "lower notch factor of tests, at this diameter", TESTED_NOTCH.low),
        ("beta_o", "upper notch factor of tests, at this diameter", TESTED_NOTCH.high),
    ] {
        sheet.formula(symbol, meaning, carried(&|| constant(factor), TESTED_DIAMETER), "", tested, None);
    }
    let (mut low, mut high) = (vec![sym("beta_u")], vec![sym("beta_o")]);
    if let Some(program) = found.formula_notch {
        let thousand = constant(1e9 * units.per_pascal);
        let formula = num("2.7") * (sym("R_ms") / thousand).power_of("0.43");
        sheet.formula("beta_40", "notch factor at a shaft of 40 mm", formula, "", NOTCH, None);
        let formula = carried(&|| sym("beta_40"), notch::REFERENCE_DIAMETER);
        sheet.formula("beta_d", "notch factor at this diameter", formula, "", SIZE, Some(program));
        low.push(sym("beta_d"));
        high.push(sym("beta_d"));
    }
    let band = "band of formula and tests";
    let (least_factor, greatest_factor) = (found.notch_factor.low, found.notch_factor.high);
    sheet.formula("beta_min", "least notch factor", least(low), "", band, Some(least_factor));
    sheet.formula("beta_max", "greatest notch factor", greatest(high), "", band, Some(greatest_factor));
}

fn life(sheet: &mut Sheet, units: &Units, name: &dyn Fn(&str) -> String, found: &Fatigue) {
    let (moment, stress) = (name("M_b"), name("sigma_b"));
    let divided = sym("pi") * (sym("d_f").power(4) - sym("b_f").power(4));
    sheet.formula(
        &stress,
        "nominal bending stress of the shaft",
        num("32") * sym(&moment) * num(units.torque_divisor) * sym("d_f") / divided,
        units.pressure,
        "bending of a round bar",
        Some(found.nominal_stress * units.per_pascal),
    );
    for (symbol, meaning, reduction, program) in [
        ("S_fl", "fatigue safety of the shaft, lower end", "K_max", found.safety.low),
        ("S_fu", "fatigue safety of the shaft, upper end", "K_min", found.safety.high),
    ] {
        let formula = sym("sigma_w") / (sym(reduction) * sym(&stress));
        sheet.formula(&name(symbol), meaning, formula, "", "nominal stress", Some(program));
    }
}
