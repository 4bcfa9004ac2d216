//! A joint of more than two rings: capacity of each interface, and the stress that governs each ring.

use super::super::condition::Condition;
use super::super::expression::{num, sym};
use super::super::kernel::{Kernel, PairInterference, pair_interferences};
use super::super::service::loosest_for_stress;
use super::super::{Findings, GoverningRing, InterfaceFindings, combination};
use super::Units;
use super::faces::{RingFaces, Spin};
use super::sheet::Sheet;
use crate::joint::{DutyState, Joint, Ring};
use crate::material::Kind;
use crate::tolerance::Extremes;

const SYSTEM: &str = "rings (or slices) at this temperature and speed, Lamé";

pub(super) fn write(sheet: &mut Sheet, findings: &Findings, units: &Units) {
    let joint = &findings.joint;
    sizes(sheet, joint, units);
    sheet.section("Capacity of the loosest pair, shop temperature");
    let diameter = |number: usize| format!("d_{number}");
    capacities(sheet, units, "a", &findings.extremes.loosest.interfaces, &diameter);
    for (index, (state, duty)) in joint.duty.iter().zip(&findings.duty).enumerate() {
        if duty.loosest.slip_safety.is_some() {
            held(sheet, units, (index, state), &duty.loosest.interfaces, &diameter);
        }
    }
    let Ok(kernel) = Kernel::new(joint) else { return };
    let pairs = pair_interferences(joint);
    for (number, governing) in findings.service.governing.iter().enumerate() {
        ring_stress(sheet, findings, units, &kernel, &pairs, (number, governing));
    }
}

/// Diameters, length and friction that the sections below share.
fn sizes(sheet: &mut Sheet, joint: &Joint, units: &Units) {
    sheet.section("Sizes and friction");
    let length = |metres: f64| metres * units.per_metre;
    let innermost = joint.rings.first().map_or(0.0, |ring| ring.inner_diameter);
    sheet.input("d_0", "bore of the innermost ring", length(innermost), units.length, "joint file");
    for (number, ring) in joint.rings.iter().enumerate() {
        let meaning = format!("outer diameter of the {}", ring.name);
        let outer = length(ring.outer_diameter);
        sheet.input(&format!("d_{}", number + 1), &meaning, outer, units.length, "joint file");
    }
    sheet.input(
        "l",
        "length that carries",
        length(joint.engaged_length()),
        units.length,
        "length less relief",
    );
    let friction = &joint.friction.holding;
    sheet.input("mu_h", "friction against slip, low end", friction.value.low, "", &friction.source);
}

/// Axial force and torque at slip of each interface; a pressure that the sheet does not know is written first.
fn capacities(
    sheet: &mut Sheet,
    units: &Units,
    tag: &str,
    interfaces: &[InterfaceFindings],
    diameter_of: &dyn Fn(usize) -> String,
) {
    for (k, interface) in interfaces.iter().enumerate() {
        let number = k + 1;
        let name = |symbol: &str| format!("{symbol}{number}{tag}");
        let pressure = name("p_");
        if !sheet.has(&pressure) {
            let meaning = format!("pressure at interface {number}");
            sheet.input(&pressure, &meaning, interface.pressure * units.per_pascal, units.pressure, SYSTEM);
        }
        let diameter = || sym(&diameter_of(number));
        let axial = sym("mu_h") * sym(&pressure) * sym("pi") * diameter() * sym("l");
        sheet.formula(
            &name("F_"),
            &format!("axial force at slip, interface {number}"),
            axial,
            units.force,
            "equilibrium; DIN 7190-1",
            Some(interface.axial_capacity * units.per_newton),
        );
        sheet.formula(
            &name("M_"),
            &format!("torque at slip, interface {number}"),
            sym(&name("F_")) * diameter() / num("2") / num(units.torque_divisor),
            units.torque,
            "equilibrium; DIN 7190-1",
            Some(interface.torque_capacity * units.per_newton_metre),
        );
    }
}

/// The loosest pair in a loaded state.
pub(super) fn held(
    sheet: &mut Sheet,
    units: &Units,
    (index, state): (usize, &DutyState),
    interfaces: &[InterfaceFindings],
    diameter_of: &dyn Fn(usize) -> String,
) {
    sheet.section(format!("Duty {}: the loosest pair", state.called()));
    let tag = format!("s{}", index + 1);
    capacities(sheet, units, &tag, interfaces, diameter_of);
    let (torque, force) = (format!("M_{tag}"), format!("F_{tag}"));
    sheet.input(&torque, "torque", state.torque * units.per_newton_metre, units.torque, "joint file");
    sheet.input(&force, "axial force", state.axial_force * units.per_newton, units.force, "joint file");
    for (k, interface) in interfaces.iter().enumerate() {
        if interface.pressure <= 0.0 {
            continue;
        }
        let number = k + 1;
        let share =
            |load: &str, capacity: &str| (sym(load) / sym(&format!("{capacity}{number}{tag}"))).power(2);
        sheet.formula(
            &format!("S_{number}{tag}"),
            &format!("safety against slip, interface {number}"),
            num("1") / (share(&torque, "M_") + share(&force, "F_")).root(),
            "",
            "resultant of both friction shares; Kollmann, Welle-Nabe-Verbindungen (1984)",
            None,
        );
    }
}

/// One ring at the combination of fits and in the state that govern its strength.
fn ring_stress(
    sheet: &mut Sheet,
    findings: &Findings,
    units: &Units,
    kernel: &Kernel<'_>,
    pairs: &Extremes<PairInterference>,
    (index, governing): (usize, &GoverningRing),
) {
    let joint = &findings.joint;
    let Some(ring) = joint.rings.get(index) else { return };
    let state = governing.state.and_then(|state| joint.duty.get(state));
    let condition = match state {
        Some(state) => Condition::of_state(joint, state),
        None => Ok(kernel.shop.clone()),
    };
    let Ok(condition) = condition else { return };
    let gradient = condition.rise.get(index).is_some_and(|rise| *rise != 0.0);
    let loosest = loosest_for_stress(pairs);
    let ends = governing.tight.iter().zip(loosest.iter().zip(&pairs.tightest.effective));
    let interference: Vec<f64> = ends.map(|(tight, (low, high))| if *tight { *high } else { *low }).collect();
    let Ok(stack) = kernel.stack(&interference, &condition) else { return };
    let Ok(solution) = stack.solve() else { return };
    let number = index + 1;
    let place = state.map_or("shop temperature", |state| state.name.as_str());
    sheet.section(format!("Stress of the {}: {}, {place}", ring.name, combination(&governing.tight)));
    let inside = index.checked_sub(1).and_then(|k| solution.pressures.get(k).copied());
    let outside = solution.pressures.get(index).copied();
    for (symbol, what, pressure, end) in [
        ("p_i", "inside", inside, condition.inner_pressure),
        ("p_o", "outside", outside, condition.outer_pressure),
    ] {
        if symbol == "p_i" && ring.inner_diameter == 0.0 {
            continue;
        }
        let source = if pressure.is_some() { SYSTEM } else { "joint file" };
        let meaning = format!("pressure {what} the {}", ring.name);
        let value = pressure.unwrap_or(end) * units.per_pascal;
        sheet.input(&format!("{symbol}{number}"), &meaning, value, units.pressure, source);
    }
    let spinning = condition.speed > 0.0;
    if spinning {
        let density = &ring.material.density;
        sheet.input(&format!("w_{number}"), "angular speed", condition.speed, "rad/s", "joint file");
        let value = density.value * units.per_kilogram_per_cubic_metre;
        let meaning = format!("density of the {}", ring.name);
        sheet.input(&format!("rho_{number}"), &meaning, value, units.density, &density.source);
        let poisson = &ring.material.poisson;
        let meaning = format!("Poisson's ratio of the {}", ring.name);
        sheet.input(&format!("nu_{number}"), &meaning, poisson.value, "", &poisson.source);
    }
    if gradient {
        sheet.input(
            &format!("sigma_e{number}"),
            &format!("equivalent stress of the {}, that of the heat flow with it", ring.name),
            governing.equivalent * units.per_pascal,
            units.pressure,
            "stack of rings in a logarithmic gradient; Timoshenko & Goodier, Theory of Elasticity, ch. 13",
        );
    } else {
        let name = |symbol: &str| format!("{symbol}{number}");
        let (outer, inner) = (name("d_"), format!("d_{}", number - 1));
        let (inside, outside) = (name("p_i"), name("p_o"));
        let (speed, density, poisson) = (name("w_"), name("rho_"), name("nu_"));
        let faces = RingFaces {
            ring,
            criterion: joint.criterion,
            tag: &number.to_string(),
            outer: &outer,
            inner: &inner,
            inside: Some(&inside),
            outside: Some(&outside),
            spin: spinning.then_some(Spin { speed: &speed, density: &density, poisson: &poisson }),
        };
        faces.write(sheet, units, governing.equivalent);
    }
    close(sheet, ring, number, governing, units);
}

fn close(sheet: &mut Sheet, ring: &Ring, number: usize, governing: &GoverningRing, units: &Units) {
    let brittle = ring.material.kind == Kind::Brittle;
    let (symbol, meaning, strength) = if brittle {
        ("R_m", "tensile strength", ring.strength.tensile_strength)
    } else {
        ("R_e", "yield strength", ring.strength.yield_strength)
    };
    let (Some(strength), Some(safety)) = (strength, governing.safety) else { return };
    let symbol = format!("{symbol}{number}");
    let meaning = format!("{meaning} of the {}", ring.name);
    sheet.input(&symbol, &meaning, strength * units.per_pascal, units.pressure, &ring.strength.source);
    sheet.formula(
        &format!("S_{number}"),
        &format!("safety of the {}", ring.name),
        sym(&symbol) / sym(&format!("sigma_e{number}")),
        "",
        "strength over equivalent stress",
        Some(safety),
    );
}
