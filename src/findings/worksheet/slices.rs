//! A stepped joint: pressure and grip slice by slice at the loosest pair.

use super::super::Findings;
use super::super::expression::{Expression, greatest, num, sym};
use super::Units;
use super::sheet::Sheet;

const LAME: &str = "Lamé for each slice; Timoshenko & Goodier, Theory of Elasticity, § 28";

pub(super) fn write(sheet: &mut Sheet, findings: &Findings, units: &Units) {
    super::fit::write(sheet, findings, units);
    let joint = &findings.joint;
    let pair = &findings.extremes.loosest;
    let (shaft, hub) = joint.shaft_and_hub();
    sheet.section("Materials and friction");
    for (ring, letter) in [(hub, "h"), (shaft, "s")] {
        let poisson = &ring.material.poisson;
        let what = |name: &str| format!("{name} of the {}", ring.name);
        let shop = joint.assembly.shop_temperature;
        super::strength::youngs_modulus(sheet, ring, letter, &ring.name, shop, units);
        sheet.input(&format!("nu_{letter}"), &what("Poisson's ratio"), poisson.value, "", &poisson.source);
        let strain = ring.material.expansion.strain(joint.assembly.shop_temperature).unwrap_or(0.0);
        let source = &ring.material.expansion.source;
        sheet.input(&format!("eps_{letter}"), &what("expansion from 20 °C to the shop"), strain, "", source);
    }
    let friction = &joint.friction.holding;
    sheet.input("mu_h", "friction against slip, low end", friction.value.low, "", &friction.source);
    let share = joint.engaged_length() / joint.length;
    sheet.input("g", "share of the length that carries", share, "", "length less relief");
    let mut total: Option<Expression> = None;
    for (index, slice) in pair.slices.iter().enumerate() {
        let number = index + 1;
        let name = |symbol: &str| format!("{symbol}{number}");
        sheet.section(format!("Slice {number}, loosest pair"));
        for (symbol, what, value) in [
            ("D_", "outer diameter of the hub", slice.hub_outer_diameter),
            ("b_", "bore of the shaft", slice.shaft_bore),
            ("l_", "length", slice.length),
        ] {
            sheet.input(&name(symbol), what, value * units.per_metre, units.length, "joint file");
        }
        let ratio = |outer: &str, inner: &str| {
            (sym(outer).power(2) + sym(inner).power(2)) / (sym(outer).power(2) - sym(inner).power(2))
        };
        let hub_flexibility = ratio(&name("D_"), "d") + sym("nu_h");
        let shaft_flexibility = ratio("d", &name("b_")) - sym("nu_s");
        sheet.formula(&name("C_h"), "flexibility of the hub", hub_flexibility, "", LAME, None);
        sheet.formula(&name("C_s"), "flexibility of the shaft", shaft_flexibility, "", LAME, None);
        let grip = sym("W_min") / num("1000") + sym("d") * (sym("eps_s") - sym("eps_h"));
        let flexibility = sym("d") * (sym(&name("C_h")) / sym("E_h") + sym(&name("C_s")) / sym("E_s"));
        sheet.formula(
            &name("p_"),
            "contact pressure",
            greatest([num("0"), grip / flexibility]),
            units.pressure,
            LAME,
            Some(slice.pressure * units.per_pascal),
        );
        let force = sym("mu_h") * sym(&name("p_")) * sym("pi") * sym("d") * sym(&name("l_")) * sym("g");
        sheet.formula(&name("F_"), "axial force at slip", force, units.force, "equilibrium", None);
        let own = sym(&name("F_"));
        total = Some(match total {
            None => own,
            Some(sum) => sum + own,
        });
    }
    let Some(total) = total else { return };
    sheet.section("The whole seat, loosest pair");
    let axial = Some(pair.axial_capacity * units.per_newton);
    sheet.formula("F_cap", "axial force at slip", total, units.force, "sum over the slices", axial);
    let torque = Some(pair.torque_capacity * units.per_newton_metre);
    let formula = super::strength::torque("F_cap", units);
    sheet.formula("M_cap", "torque at slip", formula, units.torque, "equilibrium; DIN 7190-1", torque);
    let engaged = joint.engaged_length() * units.per_metre;
    sheet.input("l", "length that carries", engaged, units.length, "length less relief");
    for (index, (state, duty)) in joint.duty.iter().zip(&findings.duty).enumerate() {
        if duty.loosest.slip_safety.is_some() {
            let diameter = |_: usize| "d".to_owned();
            super::rings::held(sheet, units, (index, state), &duty.loosest.interfaces, &diameter);
        }
    }
}
