//! Each loaded service state at the loosest pair.

use super::super::Findings;
use super::super::compute::free_strains;
use super::super::expression::{num, sym};
use super::Units;
use super::sheet::Sheet;
use super::strength::{pressure, torque};

pub(super) fn write(sheet: &mut Sheet, findings: &Findings, units: &Units) {
    let joint = &findings.joint;
    for (index, (state, duty)) in joint.duty.iter().zip(&findings.duty).enumerate() {
        let Some(safety) = duty.loosest.slip_safety else { continue };
        let Ok(strains) = free_strains(joint, &state.temperatures) else { continue };
        let tag = index + 1;
        let name = |symbol: &str| format!("{symbol}{tag}");
        sheet.section(format!("Duty state {}: slip at the loosest pair", state.name));
        let parts = ["s", "h"].into_iter().zip(&joint.rings).zip(state.temperatures.iter().zip(&strains));
        for ((letter, ring), (temperature, strain)) in parts {
            sheet.input(
                &format!("T_{letter}{tag}"),
                &format!("temperature of the {}", ring.name),
                units.degrees(*temperature),
                units.temperature,
                "joint file",
            );
            sheet.input(
                &format!("eps_{letter}{tag}"),
                &format!("expansion of the {} from 20 °C", ring.name),
                *strain,
                "",
                &ring.material.expansion.source,
            );
        }
        sheet.formula(
            &name("p_"),
            "contact pressure",
            pressure("W_min", &name("eps_s"), &name("eps_h")),
            units.pressure,
            "Lamé with free thermal strains",
            Some(duty.loosest.pressure * units.per_pascal),
        );
        slip(sheet, findings, index, safety, units);
    }
}

fn slip(sheet: &mut Sheet, findings: &Findings, index: usize, safety: f64, units: &Units) {
    let state = &findings.joint.duty[index];
    let pair = &findings.duty[index].loosest;
    let tag = index + 1;
    let (axial_name, torque_name) = (format!("F_cap{tag}"), format!("M_cap{tag}"));
    let (force_name, moment_name) = (format!("F_{tag}"), format!("M_{tag}"));
    sheet.formula(
        &axial_name,
        "axial force at slip",
        super::strength::axial(&format!("p_{tag}")),
        units.force,
        "equilibrium; DIN 7190-1",
        Some(pair.axial_capacity * units.per_newton),
    );
    sheet.formula(
        &torque_name,
        "torque at slip",
        torque(&axial_name, units),
        units.torque,
        "equilibrium; DIN 7190-1",
        Some(pair.torque_capacity * units.per_newton_metre),
    );
    sheet.input(&moment_name, "torque", state.torque * units.per_newton_metre, units.torque, "joint file");
    sheet.input(&force_name, "axial force", state.axial_force * units.per_newton, units.force, "joint file");
    if pair.pressure <= 0.0 {
        return;
    }
    let share = |load: &str, capacity: &str| (sym(load) / sym(capacity)).power(2);
    sheet.formula(
        &format!("S_{tag}"),
        "safety against slip",
        num("1") / (share(&moment_name, &torque_name) + share(&force_name, &axial_name)).root(),
        "",
        "resultant of both friction shares; Kollmann, Welle-Nabe-Verbindungen (1984)",
        Some(safety),
    );
}
