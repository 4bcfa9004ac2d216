//! A joint of more than two rings: capacity of each interface, and the stress that governs each ring.

use super::super::condition::Condition;
use super::super::expression::{Expression, Function, greatest, num, sym};
use super::super::kernel::{Kernel, PairInterference, pair_interferences};
use super::super::service::loosest_for_stress;
use super::super::{Findings, GoverningRing, InterfaceFindings, cautions::criterion_source, combination};
use super::Units;
use super::sheet::Sheet;
use crate::joint::{DutyState, Joint, Ring};
use crate::material::Kind;
use crate::mechanics::criteria::DuctileCriterion;
use crate::tolerance::Extremes;

const LAME: &str = "Lamé; Timoshenko & Goodier, Theory of Elasticity, § 28";
const ROTATION: &str = "Lamé with rotation; Timoshenko & Goodier, Theory of Elasticity, §§ 28, 32";
const SYSTEM: &str = "linear system of the rings, as above for the extreme pairs";

pub(super) fn write(sheet: &mut Sheet, findings: &Findings, units: &Units) {
    let joint = &findings.joint;
    sizes(sheet, joint, units);
    sheet.section("Capacity of the loosest pair, shop temperature");
    capacities(sheet, units, "a", &findings.extremes.loosest.interfaces);
    for (index, (state, duty)) in joint.duty.iter().zip(&findings.duty).enumerate() {
        if duty.loosest.slip_safety.is_some() {
            held(sheet, units, state, index + 1, &duty.loosest.interfaces);
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
fn capacities(sheet: &mut Sheet, units: &Units, tag: &str, interfaces: &[InterfaceFindings]) {
    for (k, interface) in interfaces.iter().enumerate() {
        let number = k + 1;
        let name = |symbol: &str| format!("{symbol}{number}{tag}");
        let pressure = name("p_");
        if !sheet.has(&pressure) {
            let meaning = format!("pressure at interface {number}");
            sheet.input(&pressure, &meaning, interface.pressure * units.per_pascal, units.pressure, SYSTEM);
        }
        let diameter = || sym(&format!("d_{number}"));
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
fn held(sheet: &mut Sheet, units: &Units, state: &DutyState, tag: usize, interfaces: &[InterfaceFindings]) {
    sheet.section(format!("Duty {}: the loosest pair", state.called()));
    let tag = format!("s{tag}");
    capacities(sheet, units, &tag, interfaces);
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
        faces(sheet, ring, number, spinning, joint.criterion, units);
        sheet.formula(
            &format!("sigma_e{number}"),
            &format!("equivalent stress of the {}, the greater of both faces", ring.name),
            greatest([sym(&format!("e_i{number}")), sym(&format!("e_o{number}"))]),
            units.pressure,
            "both faces",
            Some(governing.equivalent * units.per_pascal),
        );
    }
    close(sheet, ring, number, governing, units);
}

/// The stresses at both faces.
fn faces(
    sheet: &mut Sheet,
    ring: &Ring,
    number: usize,
    spinning: bool,
    criterion: DuctileCriterion,
    units: &Units,
) {
    let name = |symbol: &str| format!("{symbol}{number}");
    let symbol = |text: &str| sym(&name(text));
    let solid = ring.inner_diameter == 0.0;
    let outer = || sym(&format!("d_{number}")).power(2);
    let inner = || sym(&format!("d_{}", number - 1)).power(2);
    let (mut bore, mut rim) = if solid {
        (-symbol("p_o"), -symbol("p_o"))
    } else {
        let meaning = format!("bore over wall of the {}, squares of diameters", ring.name);
        sheet.formula(&name("k_"), &meaning, inner() / (outer() - inner()), "", LAME, None);
        let twice = |pressure: &str| num("2") * symbol(pressure);
        let both = || num("2") * symbol("k_") + num("1");
        (
            symbol("p_i") * both() - twice("p_o") * (symbol("k_") + num("1")),
            twice("p_i") * symbol("k_") - symbol("p_o") * both(),
        )
    };
    if spinning {
        let meaning = format!("density and speed of the {}", ring.name);
        let unit = format!("{}/{}2", units.pressure, units.length);
        let force = symbol("rho_") * symbol("w_").power(2) / num("16");
        sheet.formula(&name("f_"), &meaning, force, &unit, ROTATION, None);
        let three = || num("3") + symbol("nu_");
        let one = || num("1") - symbol("nu_");
        let (at_bore, at_rim) = if solid {
            (three() / num("2") * outer(), one() * outer())
        } else {
            (three() * outer() + one() * inner(), three() * inner() + one() * outer())
        };
        bore = bore + symbol("f_") * at_bore;
        rim = rim + symbol("f_") * at_rim;
    }
    let source = if spinning { ROTATION } else { LAME };
    let places = if solid { ["in the middle", "at the outside"] } else { ["at the bore", "at the outside"] };
    let criterion_source = criterion_source(ring.material.kind == Kind::Brittle, criterion);
    for (hoop, found, pressure, place, formula) in [
        ("sigma_i", "e_i", (!solid).then_some("p_i"), places[0], bore),
        ("sigma_o", "e_o", Some("p_o"), places[1], rim),
    ] {
        let meaning = format!("hoop stress {place} of the {}", ring.name);
        sheet.formula(&name(hoop), &meaning, formula, units.pressure, source, None);
        let meaning = format!("equivalent stress {place}");
        let formula = equivalent(ring, criterion, symbol(hoop), pressure.map(symbol));
        sheet.formula(&name(found), &meaning, formula, units.pressure, criterion_source, None);
    }
}

/// The equivalent stress at a face under a pressure; without one both stresses are the hoop stress, as in the middle of
/// a solid ring.
fn equivalent(
    ring: &Ring,
    criterion: DuctileCriterion,
    hoop: Expression,
    pressure: Option<Expression>,
) -> Expression {
    let absolute = |formula: Expression| formula.call(Function::Abs);
    match (ring.material.kind, criterion, pressure) {
        (Kind::Brittle, _, pressure) => {
            let share = || num(&crate::quantity::number(ring.tension_share(), 6));
            let mut all = vec![num("0"), hoop.clone()];
            if ring.tension_share() > 0.0 {
                all.push(-(hoop * share()));
                all.extend(pressure.map(|pressure| pressure * share()));
            }
            greatest(all)
        }
        (_, _, None) => absolute(hoop),
        (_, DuctileCriterion::VonMises, Some(pressure)) => {
            (hoop.clone().power(2) + pressure.clone().power(2) + pressure * hoop).root()
        }
        (_, DuctileCriterion::Tresca, Some(pressure)) => {
            greatest([absolute(hoop.clone() + pressure.clone()), absolute(hoop), pressure])
        }
    }
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
