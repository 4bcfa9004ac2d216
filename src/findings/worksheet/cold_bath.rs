//! What the cold bath takes, and the oxygen left in the room; in kg, J, K and m³ on every sheet.

use super::super::Findings;
use super::super::cold_bath::coolant;
use super::super::expression::{num, sym};
use super::sheet::Sheet;
use crate::assembly::atmosphere::OXYGEN_IN_AIR;

const BALANCE: &str = "heat balance, the cold gas not put to use";

pub(super) fn write(sheet: &mut Sheet, findings: &Findings) {
    let Some(found) = &findings.assembly.cold_bath else { return };
    let coolant = coolant(found.bath);
    let (shaft, _) = findings.joint.joined_last();
    let source = shaft.material.specific_heat.as_ref().map_or("", |heat| &heat.source);
    sheet.section("Cold bath");
    sheet.input(
        "M_c",
        "mass of the part that is chilled",
        found.part_mass,
        "kg",
        &shaft.material.density.source,
    );
    sheet.input(
        "c_m",
        "its mean specific heat down to the bath, below 20 °C after Debye",
        found.mean_specific_heat,
        "J/(kg.K)",
        source,
    );
    sheet.input(
        "T_warm",
        "temperature of the shop, at which the part goes in",
        findings.joint.assembly.shop_temperature,
        "K",
        "joint file",
    );
    let cold = found.liquid.map_or(coolant.source, |held| held.liquid.source);
    sheet.input("T_bath", "temperature of the bath", coolant.temperature, "K", cold);
    sheet.input("L_v", "heat of vaporisation or sublimation", coolant.latent_heat, "J/kg", coolant.source);
    sheet.formula(
        "m_part",
        "boiled off by the part",
        sym("M_c") * sym("c_m") * (sym("T_warm") - sym("T_bath")) / sym("L_v"),
        "kg",
        BALANCE,
        Some(found.job.part.mass),
    );
    sheet.input(
        "m_rest",
        "boiled off at rest meanwhile",
        found.job.idle.mass,
        "kg",
        "hourly loss times the time in the bath",
    );
    let mut gone = sym("m_part") + sym("m_rest");
    if let Some(held) = &found.liquid {
        let (name, source) = (held.liquid.name, held.liquid.source);
        sheet.input(
            "V_l",
            &format!("{name} round the part"),
            held.volume,
            "m3",
            "volume of the bath less that of the part",
        );
        sheet.input("rho_l", &format!("density of the {name}"), held.liquid.density, "kg/m3", source);
        sheet.input(
            "c_l",
            "its mean specific heat down to the bath",
            held.liquid.specific_heat,
            "J/(kg.K)",
            source,
        );
        sheet.formula(
            "m_l",
            &format!("dry ice that cools the {name}"),
            sym("V_l") * sym("rho_l") * sym("c_l") * (sym("T_warm") - sym("T_bath")) / sym("L_v"),
            "kg",
            BALANCE,
            Some(held.ice.mass),
        );
        gone = gone + sym("m_l");
    }
    sheet.input("rho_g", "density of its gas at 20 °C", coolant.gas_density, "kg/m3", coolant.source);
    sheet.formula(
        "V_g",
        "gas set free",
        gone / sym("rho_g"),
        "m3",
        BALANCE,
        Some(found.job.boiled.gas_volume),
    );
    let Some(room) = &found.room else { return };
    if found.job.boiled.gas_volume >= room.room.volume {
        return;
    }
    sheet.input("V_room", "volume of the room", room.room.volume, "m3", "joint file");
    sheet.input("O_air", "share of oxygen in air", OXYGEN_IN_AIR, "", "ISO 2533, Standard Atmosphere");
    sheet.formula(
        "O_room",
        "share of oxygen left when the gas pushes out its own volume of air",
        sym("O_air") * (num("1") - sym("V_g") / sym("V_room")),
        "",
        "oxygen-depletion formula of compressed-gas codes of practice for liquid nitrogen",
        Some(room.oxygen),
    );
}
