//! Frost on a chilled shaft: the bound by hand, against a second vapour pressure, and where it is told.

mod common;

use approx::assert_relative_eq;
use common::{findings_of, hubgrip_in, stdout};
use hubgrip::assembly::frost::{
    PACE, carried_film, deposit, greatest_deposit, vapour_density, vapour_over_water,
};
use hubgrip::findings::frost::FrostFindings;
use hubgrip::findings::{Findings, worksheet};
use proptest::prelude::*;
use serde_json::Value;

/// A bronze bush of 80/60 mm, 60 mm long, in liquid nitrogen; invented demo data.
fn cold(extra: &str) -> String {
    format!(
        "joint_file: 1\ndiameter: 80 mm\nlength: 60 mm\nshaft: {{material: CuSn12-C-GC, bore: 60 mm, roughness: Rz 6.3 um}}\n\
         hub: {{material: S355J2, outer_diameter: 130 mm, roughness: Rz 10 um}}\nfit: H7/s6\nfriction: 0.12\n\
         assembly:\n  method: chill shaft\n  bath: liquid nitrogen\n  clearance: 80 um\n{extra}"
    )
}

fn frost(findings: &Findings) -> FrostFindings {
    findings.assembly.times.handling.as_ref().unwrap().frost.unwrap()
}

/// By hand, 80 mm at 194.65 K, air at 293.15 K and half saturated, carried at 1 m/s. Film at 243.9 K from Incropera's table
/// A.4: ρ 1.43753, c_p 1006.12, ν 10.9703e-6, k 0.0217876, α 15.2168e-6, Pr 0.722074. Ra 1.2147e7 and Nu_N 30.00;
/// Re 7292.4 and Nu_F 45.42; h = (30.00³ + 45.42³)^⅓ k/d = 13.4605. D = 0.26e-4 (243.9/298)^1.5, Le 0.79042. Magnus gives
/// 2332.6 Pa over water at 20 °C and 0.0694 Pa over ice at −78.5 °C, so that ρ_v is 8.6204e-3 and ρ_s 7.73e-7 kg/m³:
/// ṁ = 13.4605/(1.43753 × 1006.12 × 0.79042^⅔) × 8.6196e-3 = 9.384e-5 kg/(m² s).
#[test]
fn the_deposit_by_hand_with_another_vapour_pressure() {
    assert_relative_eq!(carried_film(0.08, 1.0, 194.65, 293.15).unwrap(), 13.4605, max_relative = 2e-5);
    let film = 13.4605 / (1.43753 * 1006.12 * 0.790_418_f64.powf(2.0 / 3.0));
    let by_magnus = film * (8.6204e-3 - 7.73e-7);
    assert_relative_eq!(by_magnus, 9.384e-5, max_relative = 1e-3);
    let vapour = vapour_density(0.5 * vapour_over_water(293.15).unwrap(), 293.15).unwrap();
    let found = deposit(0.08, PACE, 194.65, 293.15, vapour).unwrap();
    // The two vapour pressures of water differ by 0.3 %.
    assert_relative_eq!(found.rate, by_magnus, max_relative = 5e-3);
    assert_relative_eq!(found.heat_flux(), found.rate * (2.834e6 + 2100.0 * 78.5), max_relative = 1e-12);
    assert_relative_eq!(found.growth().high, found.rate / 50.0, max_relative = 1e-12);
    assert_relative_eq!(found.growth().low, found.rate / 200.0, max_relative = 1e-12);
}

/// Still air alone: Nu of a lying cylinder by Morgan's table, 0.480 Ra^0.25 for 10⁴ to 10⁷ (V. T. Morgan 1975, in Incropera's
/// chapter 9), lies within a tenth of Churchill and Chu's.
#[test]
fn the_film_of_still_air_agrees_with_another_correlation() {
    for (diameter, surface) in [(0.02, 194.65), (0.03, 240.0), (0.05, 263.15)] {
        let air = hubgrip::assembly::frost::Air::at(0.5 * (surface + 293.15)).unwrap();
        let rayleigh: f64 = 9.806_65 * (293.15 - surface) * f64::powi(diameter, 3)
            / (air.temperature * air.viscosity * air.diffusivity);
        assert!((1e4..1e7).contains(&rayleigh), "{rayleigh}");
        let morgan = 0.480 * rayleigh.powf(0.25) * air.conductivity / diameter;
        assert_relative_eq!(
            carried_film(diameter, 0.0, surface, 293.15).unwrap(),
            morgan,
            max_relative = 0.1
        );
    }
}

#[test]
fn the_frost_of_a_joint_follows_from_its_course() {
    let found = findings_of(&cold("  humidity: 0.6\n"));
    let frost = frost(&found);
    let handling = found.assembly.times.handling.as_ref().unwrap();
    let end = frost.at_end.unwrap();
    assert_eq!(Some(end.time), handling.tightest.gone);
    let warmest = handling.tightest.points.last().unwrap().shaft_temperature;
    let by_hand =
        greatest_deposit(0.08, (handling.shaft_temperature, warmest), 293.15, frost.vapour).unwrap();
    assert_eq!(frost.deposit, by_hand);
    assert_relative_eq!(end.thickness.high, by_hand.rate * end.time / 50.0, max_relative = 1e-12);
    assert_relative_eq!(end.thickness.low, by_hand.rate * end.time / 200.0, max_relative = 1e-12);
    let section = std::f64::consts::FRAC_PI_4 * (0.08f64.powi(2) - 0.06f64.powi(2));
    assert_relative_eq!(frost.area, std::f64::consts::PI * 0.14 * 0.06 + 2.0 * section, max_relative = 1e-12);
    assert_relative_eq!(frost.heat, by_hand.heat_flux() * frost.area, max_relative = 1e-12);
    // At the time with frost, clearance less both sides of frost and the heat's share is gone: read off the course itself.
    let after = handling.tightest.points.iter().position(|point| point.time > end.gone).unwrap();
    let (a, b) = (&handling.tightest.points[after - 1], &handling.tightest.points[after]);
    let share = (end.gone - a.time) / (b.time - a.time);
    let clearance = a.clearance + share * (b.clearance - a.clearance);
    let taken = (2.0 * by_hand.rate / 50.0 + end.by_heat / end.time) * end.gone;
    assert_relative_eq!(clearance, taken, max_relative = 1e-9);
    assert!(end.gone < end.time && end.gone > 0.0);
    let (_, drifts) = worksheet::worked(&found);
    assert!(drifts.is_empty(), "{drifts:#?}");
}

#[test]
fn dry_air_brings_none_and_damp_air_more() {
    let thickness = |humidity: &str| {
        let found = findings_of(&cold(&format!("  humidity: {humidity}\n")));
        let frost = found.assembly.times.handling.as_ref().unwrap().frost;
        frost.map(|frost| frost.at_end.unwrap().thickness.high)
    };
    assert_eq!(thickness("0"), None);
    // In proportion, as there is no vapour over the cold seat to speak of.
    let (half, full) = (thickness("0.4").unwrap(), thickness("0.8").unwrap());
    assert!((1.99..2.06).contains(&(full / half)), "{half} {full}");
    let silent = findings_of(&cold(""));
    assert_eq!(frost(&silent).humidity, 0.5);
    assert!(silent.joint.defaults.iter().any(|default| default.key == "assembly.humidity"));
    let hot = cold("").replace("chill shaft", "heat hub");
    assert!(findings_of(&hot).assembly.times.handling.unwrap().frost.is_none());
}

/// The verdict stays that of the time without frost; what frost would leave is said beside it.
#[test]
fn a_time_that_frost_would_break_is_told_and_not_changed() {
    let free = findings_of(&cold("  humidity: 0.9\n"));
    let end = frost(&free).at_end.unwrap();
    let between = 0.5 * (end.gone + end.time);
    let found = findings_of(&cold(&format!("  humidity: 0.9\n  handling_time: {between:.2} s\n")));
    assert!(found.verdicts.iter().all(|verdict| verdict.ok));
    assert!(
        found
            .cautions
            .iter()
            .any(|caution| caution.text.contains("met only while the seat carries no frost"))
    );
    let quick = findings_of(&cold("  humidity: 0.9\n  handling_time: 2 s\n"));
    assert!(!quick.cautions.iter().any(|caution| caution.text.contains("carries no frost")));
}

#[test]
fn terminal_json_and_report_tell_it() {
    let here = tempfile::tempdir().unwrap();
    std::fs::write(here.path().join("cold.yaml"), cold("")).unwrap();
    let text = stdout(&hubgrip_in(here.path(), &["check", "cold.yaml"])).replace("\n  ", " ");
    assert!(text.contains("Frost is not counted in these times. A seat of the shaft that stands in the open at 50 % humidity"), "{text}");
    let json = stdout(&hubgrip_in(here.path(), &["check", "--json", "cold.yaml"]));
    let json: Value = serde_json::from_str(&json).unwrap();
    let told = &json["assembly"]["handling"]["frost"];
    let found = findings_of(&cold(""));
    let frost = frost(&found);
    assert_eq!(told["humidity"].as_f64(), Some(0.5));
    let high = told["at_end"]["thickness_high_um"].as_f64().unwrap();
    assert_relative_eq!(high, frost.at_end.unwrap().thickness.high * 1e6, max_relative = 1e-9);
    assert_relative_eq!(
        told["at_end"]["gone_with_frost_s"].as_f64().unwrap(),
        frost.at_end.unwrap().gone,
        max_relative = 1e-9
    );
    let page = hubgrip::report::html::html(&found);
    assert!(
        page.contains("Counted so, the tightest pair allows") && page.contains("Frost on the shaft: a bound")
    );
}

proptest! {
    /// More vapour, more pace, more frost; never a negative one, and none on a seat that is not below the frost point.
    #[test]
    fn the_deposit_rises_with_vapour_and_pace(
        diameter in 0.005..0.6_f64, surface in 78.0..272.0_f64, vapour in 1e-4..2e-2_f64, pace in 0.0..3.0_f64,
    ) {
        let found = deposit(diameter, pace, surface, 293.15, vapour).unwrap();
        prop_assert!(found.rate >= 0.0 && found.heat_flux() >= 0.0);
        let damper = deposit(diameter, pace, surface, 293.15, 1.1 * vapour).unwrap();
        prop_assert!(damper.rate >= found.rate);
        let faster = deposit(diameter, pace + 0.5, surface, 293.15, vapour).unwrap();
        prop_assert!(faster.rate >= found.rate);
        prop_assert!(found.rate > 0.0 || found.vapour_at_surface >= vapour);
    }
}
