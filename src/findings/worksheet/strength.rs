//! Stiffness, contact pressure, stresses, capacity and strength at the shop temperature.

use super::super::expression::{Expression, greatest, num, sym};
use super::super::{Findings, PairFindings, RingStress};
use super::Units;
use super::sheet::Sheet;
use crate::assembly::bearing_tables::BearingRing;
use crate::joint::Ring;
use crate::material::Kind;
use crate::mechanics::criteria::DuctileCriterion;

const LAME: &str = "Lamé; Timoshenko & Goodier, Theory of Elasticity, § 28";

pub(super) fn write(sheet: &mut Sheet, findings: &Findings, units: &Units) {
    let joint = &findings.joint;
    let (Some(shaft), Some(hub)) = (joint.rings.first(), joint.rings.last()) else { return };
    stiffness(sheet, shaft, hub, findings, units);
    shop_strain(sheet, findings, shaft, hub, units);
    pressures(sheet, findings, units);
    capacity(sheet, findings, units);
    sheet.section("Stress at the tightest pair, shop temperature");
    if !hub_yields(findings) {
        hub_stress(sheet, findings, hub, units);
    }
    shaft_stress(sheet, findings, shaft, units);
}

/// Which part is a bearing ring, whose free face is its raceway.
fn raceway_of(findings: &Findings) -> Option<BearingRing> {
    findings.joint.bearing.as_ref().map(|seat| seat.ring)
}

fn stiffness(sheet: &mut Sheet, shaft: &Ring, hub: &Ring, findings: &Findings, units: &Units) {
    let (shop_temperature, raceway) = (findings.joint.assembly.shop_temperature, raceway_of(findings));
    sheet.section("Stiffness of both parts");
    let length = |metres: f64| metres * units.per_metre;
    let source = |ring| {
        if raceway == Some(ring) { "effective raceway of the ring, as worked below" } else { "joint file" }
    };
    let (outer, bore) = (source(BearingRing::Inner), source(BearingRing::Outer));
    sheet.input("D", "outer diameter of the hub", length(hub.outer_diameter), units.length, outer);
    sheet.input("b", "bore of the shaft", length(shaft.inner_diameter), units.length, bore);
    for (ring, index, name) in [(hub, "h", "hub"), (shaft, "s", "shaft")] {
        let material = &ring.material;
        youngs_modulus(sheet, ring, index, name, shop_temperature, units);
        sheet.input(
            &format!("nu_{index}"),
            &format!("Poisson's ratio of the {name}"),
            material.poisson.value,
            "",
            &material.poisson.source,
        );
    }
    sheet.formula("C_h", "flexibility of the hub", ratio("D", "d") + sym("nu_h"), "", LAME, None);
    sheet.formula("C_s", "flexibility of the shaft", ratio("d", "b") - sym("nu_s"), "", LAME, None);
}

/// Young's modulus of a part at the shop temperature; from that at 20 °C by the ratio of its curve where the two differ.
pub(super) fn youngs_modulus(
    sheet: &mut Sheet,
    ring: &Ring,
    index: &str,
    name: &str,
    shop_temperature: f64,
    units: &Units,
) {
    let material = &ring.material;
    let own = material.youngs_modulus.value;
    let shop = material.youngs_modulus_at(shop_temperature).unwrap_or(own);
    let (symbol, at) = if shop == own { ("E_", "") } else { ("E_r", " at 20 °C") };
    sheet.input(
        &format!("{symbol}{index}"),
        &format!("Young's modulus of the {name}{at}"),
        own * units.per_pascal,
        units.pressure,
        &material.youngs_modulus.source,
    );
    if shop != own {
        let temperature = units.degrees(shop_temperature);
        modulus_at(sheet, ring, &ModulusAt { index, tag: "", temperature, modulus: shop }, units);
    }
}

/// Young's modulus of a part in a condition.
pub(super) struct ModulusAt<'a> {
    /// `h` or `s`.
    pub(super) index: &'a str,
    /// Number of the state; empty for the shop.
    pub(super) tag: &'a str,
    /// Temperature in the printed unit.
    pub(super) temperature: f64,
    /// Modulus, Pa.
    pub(super) modulus: f64,
}

/// The ratio of the curve, and the modulus of the condition from that at 20 °C.
pub(super) fn modulus_at(sheet: &mut Sheet, ring: &Ring, at: &ModulusAt<'_>, units: &Units) {
    let ModulusAt { index, tag, temperature, modulus } = *at;
    let own = ring.material.youngs_modulus.value;
    let source = ring.material.youngs_modulus_curve.as_ref().map_or("", |curve| &curve.source);
    let ratio = format!("e_{index}{tag}");
    let at = format!("{} {}", crate::quantity::number(temperature, 4), units.temperature.replace("deg", "°"));
    let what = format!("Young's modulus of the {} at {at} over that at 20 °C", ring.name);
    sheet.input(&ratio, &what, modulus / own, "", source);
    let reference = sheet.first_of(&[&format!("E_r{index}"), &format!("E_{index}")]);
    sheet.formula(
        &format!("E_{index}{tag}"),
        &format!("Young's modulus of the {} at {at}", ring.name),
        sym(&reference) * sym(&ratio),
        units.pressure,
        "elastic law at the current temperature",
        Some(modulus * units.per_pascal),
    );
}

/// (a² + b²)/(a² − b²).
fn ratio(outer: &str, inner: &str) -> Expression {
    let square = |symbol: &str| sym(symbol).power(2);
    (square(outer) + square(inner)) / (square(outer) - square(inner))
}

/// Free strains at the shop temperature; written as inputs since they are read from curves.
fn shop_strain(sheet: &mut Sheet, findings: &Findings, shaft: &Ring, hub: &Ring, units: &Units) {
    let joint = &findings.joint;
    sheet.input(
        "T_shop",
        "shop temperature",
        units.degrees(joint.assembly.shop_temperature),
        units.temperature,
        "joint file",
    );
    for (ring, symbol) in [(shaft, "eps_s"), (hub, "eps_h")] {
        let strain = ring.material.expansion.strain(joint.assembly.shop_temperature).unwrap_or(0.0);
        sheet.input(
            symbol,
            &format!("expansion of the {} from 20 °C to the shop temperature", ring.name),
            strain,
            "",
            &ring.material.expansion.source,
        );
    }
}

fn pressures(sheet: &mut Sheet, findings: &Findings, units: &Units) {
    sheet.section("Contact pressure, shop temperature, at rest");
    for (symbol, interference, name, pair) in [
        ("p_min", "W_min", "loosest", &findings.extremes.loosest),
        ("p_m", "W_m", "mean", &findings.extremes.mean),
        ("p_max", "W_max", "tightest", &findings.extremes.tightest),
    ] {
        sheet.formula(
            symbol,
            &format!("contact pressure, {name} pair"),
            pressure(interference, "eps_s", "eps_h"),
            units.pressure,
            LAME,
            Some(elastic_pressure(pair) * units.per_pascal),
        );
    }
    plastic(sheet, findings, units);
}

/// The elastic pressure of a pair, also where the hub yields by design.
fn elastic_pressure(pair: &PairFindings) -> f64 {
    if pair.smoothing > 0.0 { pair.pressure_smoothed } else { pair.pressure_unsmoothed }
}

/// Whether a hub that may yield by design does so, at any pair or in any state.
pub(super) fn hub_yields(findings: &Findings) -> bool {
    let Some(plastic) = &findings.service.plastic else { return false };
    plastic.worn.as_ref().is_some_and(|worn| worn.tightest > 0.0)
}

/// The pressures of the elastic-plastic hub as assembled, and what stays of its growth.
fn plastic(sheet: &mut Sheet, findings: &Findings, units: &Units) {
    let Some(plastic) = &findings.service.plastic else { return };
    let Some(worn) = plastic.worn.as_ref().filter(|_| hub_yields(findings)) else { return };
    sheet.section(format!("Elastic-plastic hub, {} rule, at rest", findings.joint.require.yield_rule.name()));
    let source = "elastic-plastic disc: Kollmann, Welle-Nabe-Verbindungen (1984); von Mises: Nadai (1950)";
    for (tag, name, state) in [
        ("min", "loosest", &plastic.loosest),
        ("m", "mean", &plastic.mean),
        ("max", "tightest", &plastic.tightest),
    ] {
        sheet.input(
            &format!("P_{tag}"),
            &format!("pressure of the hub that yields, {name} pair"),
            state.pressure * units.per_pascal,
            units.pressure,
            source,
        );
    }
    sheet.input(
        "G_min",
        "growth of the hub's bore that stays, loosest pair, after the hardest state",
        worn.loosest * units.per_metre,
        units.length,
        source,
    );
}

/// max(0, (W/1000 + d (ε_s − ε_h)) / (d (C_h/E_h + C_s/E_s))).
pub(super) fn pressure(interference: &str, shaft_strain: &str, hub_strain: &str) -> Expression {
    greatest([num("0"), grip(interference, shaft_strain, hub_strain) / flexibility("E_h", "E_s")])
}

/// Interference with the free strains: W/1000 + d (ε_s − ε_h).
pub(super) fn grip(interference: &str, shaft_strain: &str, hub_strain: &str) -> Expression {
    sym(interference) / num("1000") + sym("d") * (sym(shaft_strain) - sym(hub_strain))
}

/// Interference for each unit of pressure: d (C_h/E_h + C_s/E_s).
pub(super) fn flexibility(hub_modulus: &str, shaft_modulus: &str) -> Expression {
    sym("d") * (sym("C_h") / sym(hub_modulus) + sym("C_s") / sym(shaft_modulus))
}

fn capacity(sheet: &mut Sheet, findings: &Findings, units: &Units) {
    let joint = &findings.joint;
    sheet.section("Capacity at the loosest pair, shop temperature");
    sheet.input("L", "length of the hub", joint.length * units.per_metre, units.length, "joint file");
    sheet.input("r", "relief, carries nothing", joint.relief * units.per_metre, units.length, "joint file");
    let engaged = joint.engaged_length() * units.per_metre;
    sheet.formula(
        "l",
        "length that carries",
        sym("L") - sym("r"),
        units.length,
        "length less relief",
        Some(engaged),
    );
    sheet.input(
        "mu_h",
        "friction against slip, low end",
        joint.friction.holding.value.low,
        "",
        &joint.friction.holding.source,
    );
    let pair = &findings.extremes.loosest;
    sheet.formula(
        "F_cap",
        "axial force at slip",
        axial(if hub_yields(findings) { "P_min" } else { "p_min" }),
        units.force,
        "equilibrium; DIN 7190-1",
        Some(pair.axial_capacity * units.per_newton),
    );
    sheet.formula(
        "M_cap",
        "torque at slip",
        torque("F_cap", units),
        units.torque,
        "equilibrium; DIN 7190-1",
        Some(pair.torque_capacity * units.per_newton_metre),
    );
}

/// μ p π d l.
pub(super) fn axial(pressure: &str) -> Expression {
    sym("mu_h") * sym(pressure) * sym("pi") * sym("d") * sym("l")
}

/// F d/2 in the printed torque unit.
pub(super) fn torque(axial: &str, units: &Units) -> Expression {
    sym(axial) * sym("d") / num("2") / num(units.torque_divisor)
}

fn hub_stress(sheet: &mut Sheet, findings: &Findings, hub: &Ring, units: &Units) {
    let pair: &PairFindings = &findings.extremes.tightest;
    let Some(stress) = pair.rings.last() else { return };
    let pa = |value: f64| Some(value * units.per_pascal);
    sheet.formula(
        "sigma_rh",
        "radial stress at the hub bore",
        -sym("p_max"),
        units.pressure,
        LAME,
        pa(stress.bore.radial),
    );
    sheet.formula(
        "sigma_th",
        "hoop stress at the hub bore",
        sym("p_max") * ratio("D", "d"),
        units.pressure,
        LAME,
        pa(stress.bore.hoop),
    );
    let equivalent = match (hub.material.kind, findings.joint.criterion) {
        (Kind::Brittle, _) => greatest([num("0"), sym("sigma_th")]),
        (_, DuctileCriterion::VonMises) => von_mises("sigma_rh", "sigma_th"),
        (_, DuctileCriterion::Tresca) => sym("sigma_th") - sym("sigma_rh"),
    };
    close(sheet, findings, hub, stress, "h", equivalent, units);
}

fn shaft_stress(sheet: &mut Sheet, findings: &Findings, shaft: &Ring, units: &Units) {
    let Some(stress) = findings.extremes.tightest.rings.first() else { return };
    let pa = |value: f64| Some(value * units.per_pascal);
    let solid = shaft.inner_diameter == 0.0;
    let pressure = || sym(if hub_yields(findings) { "P_max" } else { "p_max" });
    let (meaning, hoop, program) = if solid {
        ("hoop stress in the solid shaft, everywhere", -pressure(), stress.rim.hoop)
    } else {
        let wall = num("2") * sym("d").power(2) / (sym("d").power(2) - sym("b").power(2));
        ("hoop stress at the shaft bore", -(pressure() * wall), stress.bore.hoop)
    };
    sheet.formula("sigma_ts", meaning, hoop, units.pressure, LAME, pa(program));
    let equivalent = match shaft.material.kind {
        Kind::Brittle if shaft.tension_share() > 0.0 => {
            let meaning = format!("tensile over compressive strength of the {}", shaft.name);
            let source = shaft.material.compressive_strength.as_ref().map_or("", |value| &value.source);
            sheet.input("k_s", &meaning, shaft.tension_share(), "", source);
            -(sym("sigma_ts") * sym("k_s"))
        }
        Kind::Brittle => greatest([num("0"), sym("sigma_ts")]),
        Kind::Ductile | Kind::Polymer => sym("sigma_ts").call(super::super::expression::Function::Abs),
    };
    close(sheet, findings, shaft, stress, "s", equivalent, units);
}

fn von_mises(radial: &str, hoop: &str) -> Expression {
    (sym(radial).power(2) + sym(hoop).power(2) - sym(radial) * sym(hoop)).root()
}

/// Equivalent stress, strength, safety.
fn close(
    sheet: &mut Sheet,
    findings: &Findings,
    ring: &Ring,
    stress: &RingStress,
    index: &str,
    equivalent: Expression,
    units: &Units,
) {
    let brittle = ring.material.kind == Kind::Brittle;
    let source = super::super::cautions::criterion_source(brittle, findings.joint.criterion);
    let symbol = format!("sigma_e{index}");
    sheet.formula(
        &symbol,
        &format!("equivalent stress of the {}", ring.name),
        equivalent,
        units.pressure,
        source,
        Some(stress.equivalent * units.per_pascal),
    );
    let Some(strength) = stress.strength else { return };
    let (name, meaning) = if brittle { ("R_m", "tensile strength") } else { ("R_e", "yield strength") };
    let strength_symbol = format!("{name}{index}");
    sheet.input(
        &strength_symbol,
        &format!("{meaning} of the {}", ring.name),
        strength * units.per_pascal,
        units.pressure,
        &ring.strength.source,
    );
    if let Some(safety) = stress.safety {
        sheet.formula(
            &format!("S_{index}"),
            &format!("safety of the {}", ring.name),
            sym(&strength_symbol) / sym(&symbol),
            "",
            "strength over equivalent stress",
            Some(safety),
        );
    }
}
