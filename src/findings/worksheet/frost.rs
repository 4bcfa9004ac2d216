//! The bound on the frost of a chilled shaft; in SI units on every sheet, the thickness in µm.

use super::super::Findings;
use super::super::expression::{num, sym};
use super::sheet::Sheet;
use crate::assembly::frost::{
    FROST_DENSITY, ICE_SPECIFIC_HEAT, SUBLIMATION_HEAT, VAPOUR_GAS_CONSTANT, vapour_over_water,
};

const AIR: &str = "F. P. Incropera and D. P. DeWitt, Fundamentals of Heat and Mass Transfer, tables A.4 and A.8, at the mean of seat and air";
const ANALOGY: &str = "analogy of heat and mass transfer, Incropera and DeWitt, chapter 6";

pub(super) fn write(sheet: &mut Sheet, findings: &Findings) {
    let Some(found) = findings.assembly.times.handling.as_ref().and_then(|handling| handling.frost) else {
        return;
    };
    let Some(end) = found.at_end else { return };
    let shop = findings.joint.assembly.shop_temperature;
    let Ok(saturated) = vapour_over_water(shop) else { return };
    let deposit = found.deposit;
    sheet.section("Frost on the shaft: a bound, not counted in the handling time");
    sheet.input(
        "phi_a",
        "relative humidity of the room",
        found.humidity,
        "",
        "joint file, or an ordinary room",
    );
    sheet.input(
        "p_w",
        "vapour pressure over water at the temperature of the air",
        saturated,
        "Pa",
        "D. M. Murphy and T. Koop, Quarterly Journal of the Royal Meteorological Society 131 (2005) 1539, equation 10 (from memory)",
    );
    sheet.input(
        "R_v",
        "gas constant of water vapour",
        VAPOUR_GAS_CONSTANT,
        "J/(kg.K)",
        "8.314462618/0.01801528",
    );
    sheet.input("T_a", "temperature of the air", shop, "K", "joint file");
    sheet.formula(
        "rho_v",
        "density of the vapour in the room",
        sym("phi_a") * sym("p_w") / (sym("R_v") * sym("T_a")),
        "kg/m3",
        "law of ideal gases",
        Some(found.vapour),
    );
    sheet.input(
        "T_seat",
        "temperature of the seat at which most settles",
        deposit.surface,
        "K",
        "search while it warms",
    );
    sheet.input(
        "rho_i",
        "density of the vapour over ice at the seat",
        deposit.vapour_at_surface,
        "kg/m3",
        "Murphy and Koop (2005), equation 7 (from memory)",
    );
    sheet.input(
        "h_a",
        "film coefficient of the seat carried at 1 m/s",
        deposit.film,
        "W/(m2.K)",
        "S. W. Churchill and H. H. S. Chu (1975) with S. W. Churchill and M. Bernstein (1977), sum of cubes",
    );
    sheet.input("rho_a", "density of the air", deposit.air.density, "kg/m3", AIR);
    sheet.input("c_a", "its specific heat", deposit.air.specific_heat, "J/(kg.K)", AIR);
    sheet.input(
        "Le_p",
        "Lewis number of vapour in air to the power 2/3",
        deposit.air.lewis().powf(2.0 / 3.0),
        "",
        AIR,
    );
    sheet.formula(
        "w_f",
        "frost that settles",
        sym("h_a") / (sym("rho_a") * sym("c_a") * sym("Le_p")) * (sym("rho_v") - sym("rho_i")),
        "kg/(m2.s)",
        ANALOGY,
        Some(deposit.rate),
    );
    sheet.input("t_f", "time that the tightest pair allows", end.time, "s", "handling time");
    sheet.input(
        "rho_f",
        "density of the lightest frost",
        FROST_DENSITY.low,
        "kg/m3",
        "texts on refrigeration (from memory)",
    );
    sheet.formula(
        "delta_f",
        "greatest thickness on the seat",
        num("1000000") * sym("w_f") * sym("t_f") / sym("rho_f"),
        "um",
        "mass over density",
        Some(end.thickness.high * 1e6),
    );
    sheet.input(
        "L_s",
        "heat of sublimation of ice",
        SUBLIMATION_HEAT,
        "J/kg",
        "steam tables, IAPWS (from memory)",
    );
    sheet.input("c_i", "specific heat of ice", ICE_SPECIFIC_HEAT, "J/(kg.K)", "at 0 °C (from memory)");
    sheet.input("A_f", "faces over the length of the hub", found.area, "m2", "seat, bore and both ends");
    sheet.formula(
        "Q_f",
        "greatest heat that the frost brings",
        sym("w_f") * sym("A_f") * (sym("L_s") + sym("c_i") * (num("273.15") - sym("T_seat"))),
        "W",
        "heat of sublimation, and of ice cooled down to the seat",
        Some(found.heat),
    );
}
