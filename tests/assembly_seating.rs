//! Oven and bath end to end: soak, handling time, coolant, air, press and release of a whole joint.

mod common;

use approx::assert_relative_eq;
use common::{findings_of, hubgrip_in, stdout};
use hubgrip::assembly::conduction::{Body, Conduction, Substance, Surroundings};
use hubgrip::assembly::film::Film;
use hubgrip::assembly::handling::{
    Accuracy, HUB_EMISSIVITY, HandledPart, Handling, gap_air_conductivity, still_air_films,
};
use hubgrip::assembly::soak::soak;
use hubgrip::findings::{Findings, Question, VerdictUnit};
use hubgrip::material::library::Library;
use proptest::prelude::*;
use serde_json::Value;

/// Invented demo data.
fn hot(extra: &str) -> String {
    format!(
        "joint_file: 1\ndiameter: 90 mm\nlength: 100 mm\nshaft: {{material: 42CrMo4+QT, roughness: Rz 6.3 um}}\n\
         hub: {{material: C45+N, outer_diameter: 160 mm, roughness: Rz 10 um}}\nfit: H7/u6\n\
         assembly:\n  method: heat hub\n  clearance: 90 um\n{extra}"
    )
}

/// Invented demo data.
fn cold(extra: &str) -> String {
    format!(
        "joint_file: 1\ndiameter: 80 mm\nlength: 60 mm\nshaft: {{material: CuSn12-C-GC, bore: 60 mm, roughness: Rz 6.3 um}}\n\
         hub: {{material: S355J2, outer_diameter: 130 mm, roughness: Rz 10 um}}\nfit: H7/s6\nfriction: 0.12\n\
         assembly:\n  method: chill shaft\n  bath: liquid nitrogen\n  clearance: 80 um\n{extra}"
    )
}

fn handling_time(findings: &Findings) -> f64 {
    findings.assembly.times.handling.as_ref().unwrap().tightest.gone.unwrap()
}

#[test]
fn the_clearance_falls_from_the_one_wanted_to_the_form_error() {
    let found = findings_of(&hot("  form_error: 10 um\n  handling_allowance: 20 um\n"));
    let handling = found.assembly.times.handling.as_ref().unwrap();
    let (first, last) = (handling.tightest.points.first().unwrap(), handling.tightest.points.last().unwrap());
    // 90 + 10 + 20 µm are opened, and the parts touch at their form error.
    assert_relative_eq!(first.clearance, 120e-6, max_relative = 1e-6);
    assert_relative_eq!(last.clearance, 10e-6, max_relative = 1e-6);
    assert!(handling.loosest.gone.unwrap() > handling.tightest.gone.unwrap());
    assert!(handling.tightest.gone_in_air.unwrap() > 10.0 * handling.tightest.gone.unwrap());
    let interference = found.extremes.tightest.interference - found.extremes.loosest.interference;
    let loosest = handling.loosest.points.first().unwrap().clearance;
    assert_relative_eq!(loosest - first.clearance, interference, max_relative = 1e-6);
}

/// The mesh and the step of every joint against ones three times as fine: 0.5 % is allowed.
#[test]
fn a_finer_mesh_and_step_change_the_handling_time_by_less_than_half_a_per_cent() {
    for text in [hot(""), cold(""), hot("  transfer_time: 20 s\n")] {
        let found = findings_of(&text);
        let joint = &found.joint;
        let handling = found.assembly.times.handling.as_ref().unwrap();
        let part = |ring: &hubgrip::joint::Ring, temperature| {
            let material = &ring.material;
            let [bore, rim, ends] = still_air_films(ring.outer_diameter, joint.length, HUB_EMISSIVITY);
            HandledPart {
                inner_diameter: ring.inner_diameter,
                outer_diameter: ring.outer_diameter,
                substance: Substance::constant(
                    material.conductivity.as_ref().unwrap().value,
                    material.density.value,
                    material.specific_heat.as_ref().unwrap().value,
                )
                .unwrap(),
                expansion: material.expansion.clone(),
                temperature,
                bore,
                rim,
                ends,
            }
        };
        let pair = Handling {
            hub: part(&joint.rings[1], handling.hub_temperature),
            shaft: part(&joint.rings[0], handling.shaft_temperature),
            length: joint.length,
            interference: found.extremes.tightest.interference,
            air_temperature: joint.assembly.shop_temperature,
            gas_conductivity: gap_air_conductivity(handling.hub_temperature, handling.shaft_temperature),
            overlap_after: joint.assembly.practice.transfer_time,
        };
        let quick = pair.course_with(0.0, Accuracy::QUICK).unwrap().gone.unwrap();
        let halved = Accuracy { tolerance: Accuracy::QUICK.tolerance / 16.0, ..Accuracy::QUICK };
        let halved = pair.course_with(0.0, halved).unwrap().gone.unwrap();
        let fine = pair.course(0.0).unwrap().gone.unwrap();
        assert_relative_eq!(quick, halved, max_relative = 5e-3);
        assert_relative_eq!(quick, fine, max_relative = 5e-3);
        if joint.assembly.heats() {
            // With a constant specific heat this is the pair of the findings.
            assert_relative_eq!(handling_time(&found), quick, max_relative = 1e-9);
        }
    }
}

#[test]
fn a_hotter_oven_and_a_later_overlap_give_more_time() {
    let plain = handling_time(&findings_of(&hot("")));
    assert!(handling_time(&findings_of(&hot("  oven_temperature: 280 degC\n"))) > plain);
    assert!(handling_time(&findings_of(&hot("  transfer_time: 15 s\n"))) > plain);
}

#[test]
fn the_soak_in_the_default_oven_clears_at_its_99_per_cent_mark() {
    let found = findings_of(&hot(""));
    let soak = found.assembly.times.hub.as_ref().unwrap();
    assert_relative_eq!(soak.to_wanted.unwrap(), soak.marks[2], max_relative = 1e-6);
    assert!(soak.marks[0] < soak.marks[1] && soak.marks[1] < soak.marks[2]);
    // The rise over the excess: (T − T_shop)/(T_oven − T_shop) = 0.99.
    let shop = found.joint.assembly.shop_temperature;
    assert_relative_eq!((soak.wanted - shop) / (soak.medium_temperature - shop), 0.99, max_relative = 1e-9);
    let hotter = findings_of(&hot("  oven_temperature: 280 degC\n"));
    let hotter = hotter.assembly.times.hub.as_ref().unwrap();
    assert!(hotter.to_wanted.unwrap() < soak.to_wanted.unwrap());
    let still = findings_of(&hot("  medium: still oven\n"));
    assert!(still.assembly.times.hub.as_ref().unwrap().marks[2] > soak.marks[2]);
    let oil = findings_of(&hot("  medium: oil bath\n"));
    assert!(oil.assembly.times.hub.as_ref().unwrap().marks[2] < soak.marks[2]);
}

/// The mesh used in boiling nitrogen against one twice as fine in both directions.
#[test]
fn a_finer_mesh_changes_the_chill_time_by_less_than_a_hundredth() {
    let found = findings_of(&cold(""));
    let chill = found.assembly.times.shaft.as_ref().unwrap();
    let bronze = &found.joint.rings[0].material;
    let body = Body { inner_diameter: 0.06, outer_diameter: 0.08, length: 0.06 };
    let mean = found.assembly.cold_bath.as_ref().unwrap().mean_specific_heat;
    let conductivity = bronze.conductivity.as_ref().unwrap().value;
    let substance = Substance::constant(conductivity, bronze.density.value, mean).unwrap();
    let around = Surroundings::all_round(77.36, Film::NitrogenPool(0.08));
    let part = Conduction::new(body, substance, around, 293.15).unwrap().with_tolerance(1e-3).unwrap();
    let [coarse, fine] = [2, 4].map(|rings| soak(&part.clone().with_rings(rings).unwrap()).unwrap());
    assert_relative_eq!(coarse.to_99_percent.value, fine.to_99_percent.value, max_relative = 0.01);
    assert_relative_eq!(coarse.to_90_percent.value, fine.to_90_percent.value, max_relative = 0.01);
    // With the same heat in total the chill takes about as long as with the curve of the specific heat.
    assert_relative_eq!(chill.marks[2], fine.to_99_percent.value, max_relative = 0.15);
}

#[test]
fn an_oven_that_is_too_cold_leaves_no_time() {
    let found = findings_of(&hot("  oven_temperature: 60 degC\n  handling_time: 5 s\n"));
    assert_eq!(found.assembly.times.hub.as_ref().unwrap().to_wanted, None);
    assert_eq!(handling_time(&found), 0.0);
    let verdict = found.verdicts.iter().find(|verdict| verdict.unit == VerdictUnit::Time).unwrap();
    assert!(!verdict.ok && verdict.question == Question::Assembly);
    // The temperature needed is more than the oven gives.
    let hub = found.verdicts.iter().find(|verdict| verdict.unit == VerdictUnit::Temperature).unwrap();
    assert!(!hub.ok && hub.required == Some(333.15) && hub.found == found.assembly.heat_hub.temperature);
}

/// A hub that is left in an oven above its limit becomes as hot as that, though it would clear below.
#[test]
fn an_oven_above_the_limit_of_the_hub_is_not_met() {
    let found = findings_of(&hot("  oven_temperature: 340 degC\n  hub_temperature_limit: 320 degC\n"));
    let hub = found.verdicts.iter().find(|verdict| verdict.unit == VerdictUnit::Temperature).unwrap();
    assert!(found.assembly.heat_hub.possible && !hub.ok);
    assert_eq!((hub.found, hub.required), (Some(613.15), Some(593.15)));
    assert_eq!(hub.at, "left in its oven");
}

/// Parts that overlap only after the clearance is gone cannot be seated.
#[test]
fn a_transfer_that_takes_longer_than_there_is_time_is_not_met() {
    let time = |transfer: &str| {
        let found = findings_of(&hot(&format!("  transfer_time: {transfer}\n")));
        found.verdicts.into_iter().find(|verdict| verdict.unit == VerdictUnit::Time).unwrap()
    };
    let (short, long) = (time("1 s"), time("10 h"));
    assert!(short.ok && short.required == Some(1.0));
    assert!(!long.ok && long.found.unwrap() < 36_000.0);
}

#[test]
fn induction_has_a_handling_time_but_no_soak() {
    let found = findings_of(&hot("  medium: induction\n"));
    assert!(found.assembly.times.hub.is_none() && handling_time(&found) > 0.0);
    assert!(found.notes.iter().any(|note| note.contains("induction heats it from inside")));
    assert!(found.cautions.iter().any(|caution| caution.text.contains("pacemaker")));
}

/// Heat balance by hand: the bush of 80/60 mm, 60 mm long, of bronze boils off its heat over 199.2 kJ/kg.
#[test]
fn the_coolant_follows_from_the_heat_of_the_part() {
    let found = findings_of(&cold("  room: {volume: 2 m3, air_changes: 0}\n  vessel: {volume: 3 l}\n"));
    let bath = found.assembly.cold_bath.as_ref().unwrap();
    let bronze = &found.joint.rings[0].material;
    let volume = std::f64::consts::FRAC_PI_4 * (0.08_f64.powi(2) - 0.06_f64.powi(2)) * 0.06;
    assert_relative_eq!(bath.part_mass, volume * bronze.density.value, max_relative = 1e-12);
    // A bronze gives up 80 % to 90 % of what its room-temperature specific heat says down to 77 K (Debye, copper).
    let most = bath.part_mass * bronze.specific_heat.as_ref().unwrap().value * (293.15 - 77.36) / 199.2e3;
    let share = bath.job.part.mass / most;
    assert!((0.80..0.92).contains(&share), "{share}");
    assert!(bath.with_cold_gas.mass < bath.job.part.mass);
    assert_relative_eq!(bath.job.cover.volume, 0.003 - volume, max_relative = 1e-9);
    // A twentieth of three litres in an hour.
    assert_relative_eq!(bath.hourly_loss.volume, 0.003 / 20.0, max_relative = 1e-9);
    let room = bath.room.unwrap();
    assert_relative_eq!(room.oxygen, 0.2095 * (1.0 - bath.job.boiled.gas_volume / 2.0), max_relative = 1e-12);
    assert!(found.cautions.iter().any(|caution| caution.text.contains("do not work alone")));
    let large = findings_of(&cold("  room: {volume: 200 m3, air_changes: 4}\n"));
    assert!(!large.cautions.iter().any(|caution| caution.text.contains("The gas of this job")));
    let least = bath.least_room;
    assert_relative_eq!(0.2095 * (1.0 - bath.job.boiled.gas_volume / least), 0.195, max_relative = 1e-9);
}

/// The amounts themselves scale in a property of the coolant's own tests; here the length reaches the part.
#[test]
fn the_coolant_of_a_part_scales_with_its_length() {
    let boiled = |length: &str| {
        let found = findings_of(&cold(&format!("  chilled_length: {length}\n")));
        found.assembly.cold_bath.unwrap().job.part.mass
    };
    assert_relative_eq!(boiled("150 mm"), 2.5 * boiled("60 mm"), max_relative = 1e-9);
}

#[test]
fn dry_ice_is_judged_by_its_carbon_dioxide() {
    let text =
        cold("  room: {volume: 3 m3}\n").replace("liquid nitrogen", "dry ice").replace("80 um", "10 um");
    let found = findings_of(&text);
    let room = found.assembly.cold_bath.as_ref().unwrap().room.unwrap();
    assert!(room.carbon_dioxide.unwrap() > 0.005);
    assert!(found.cautions.iter().any(|caution| caution.text.contains("0.5 % allowed for eight hours")));
}

#[test]
fn a_vessel_that_does_not_hold_the_part_is_told() {
    let found = findings_of(&cold("  vessel: {volume: 0.05 l}\n"));
    assert!(found.assembly.cold_bath.is_none());
    assert!(found.notes.iter().any(|note| note.contains("does not go into the vessel")));
}

#[test]
fn a_constant_coefficient_overstates_the_shrinkage_in_nitrogen() {
    let found = findings_of(&cold(""));
    let bush = &found.assembly.constant_coefficient[0];
    let excess = bush.by_coefficient / bush.by_curve;
    assert!((1.1..1.4).contains(&excess), "{excess}");
}

#[test]
fn a_pressed_joint_has_press_and_release_but_no_times() {
    let found = findings_of(&hot("").replace("heat hub", "press"));
    let (assembly, times) = (&found.assembly, &found.assembly.times);
    assert!(times.hub.is_none() && times.handling.is_none() && assembly.cold_bath.is_none());
    let work = assembly.press_work.as_ref().unwrap();
    // 1 t is 9806.65 N and 1 US ton 8896.443 N.
    assert_relative_eq!(
        work.size.metric_tons * 9806.65,
        work.size.us_tons * 8_896.443_230_521,
        max_relative = 1e-12
    );
    assert!(work.size.force >= 1.25 * assembly.press.tightest.peak_force * (1.0 - 1e-9));
    let release = *work.release.as_ref().unwrap();
    let joint = &found.joint;
    // Half behind: U = D ε_h(T) − (D + U) ε_s(T_shop + half the rise).
    let (shaft, hub) = (&joint.rings[0].material.expansion, &joint.rings[1].material.expansion);
    let shop = joint.assembly.shop_temperature;
    let interference = found.extremes.tightest.interference;
    let opened = 0.09 * hub.strain(release).unwrap()
        - (0.09 + interference) * shaft.strain(shop + 0.5 * (release - shop)).unwrap();
    assert_relative_eq!(opened, interference, max_relative = 1e-9);
}

#[test]
fn a_slender_pin_is_told_to_buckle() {
    let text = "joint_file: 1\ndiameter: 6 mm\nlength: 60 mm\nshaft: {material: C45+N, roughness: Rz 4 um}\n\
                hub: {material: C45+N, outer_diameter: 30 mm, roughness: Rz 4 um}\nfit: H7/s6\n";
    let found = findings_of(text);
    let work = found.assembly.press_work.as_ref().unwrap();
    // l/i with i = d/4.
    assert_relative_eq!(work.buckling.unwrap().slenderness, 60.0 / (6.0 / 4.0), max_relative = 1e-12);
    assert!(found.cautions.iter().any(|caution| caution.text.contains("slender")));
}

#[test]
fn the_terminal_puts_the_time_first_and_json_has_it_in_seconds() {
    let here = tempfile::tempdir().unwrap();
    std::fs::write(here.path().join("hot.yaml"), hot("  handling_time: 1 h\n")).unwrap();
    let output = hubgrip_in(here.path(), &["check", "hot.yaml"]);
    assert_eq!(output.status.code(), Some(1));
    let text = stdout(&output);
    let section = text.split("\nAssembly\n").nth(1).unwrap();
    assert!(section.starts_with("Tightest pair: "), "{section}");
    assert!(section.lines().next().unwrap().ends_with(" from oven to seated."));
    assert!(text.contains("NOT MET  time from oven to seated"), "{text}");
    let json: Value =
        serde_json::from_str(&stdout(&hubgrip_in(here.path(), &["check", "--json", "hot.yaml"]))).unwrap();
    let assembly = &json["assembly"];
    let time = assembly["handling_time_s"].as_f64().unwrap();
    assert_relative_eq!(time, handling_time(&findings_of(&hot(""))), max_relative = 1e-12);
    assert_eq!(assembly["handling"]["tightest"]["gone_s"].as_f64(), Some(time));
    assert!(assembly["handling"]["tightest"]["points"].as_array().unwrap().len() <= 41);
    assert!(assembly["hub_soak"]["to_99_percent_s"].as_f64().unwrap() > 0.0);
    assert!(assembly["press_work"]["push_out_press_n"].as_f64().unwrap() > 0.0);
    let verdicts = json["verdicts"].as_array().unwrap();
    let verdict = verdicts.iter().find(|verdict| verdict["unit"] == "s").unwrap();
    assert_eq!(verdict["required"].as_f64(), Some(3600.0));
}

#[test]
fn the_report_has_the_plot_and_the_headline_beside_the_step() {
    let page = hubgrip::report::html::html(&findings_of(&cold("  room: {volume: 60 m3, air_changes: 4}\n")));
    assert!(page.contains("plot-handling") && page.contains("from bath to seated"));
    assert!(page.contains("Liquid nitrogen to bring"));
    assert!(page.contains("of oxygen in the room of 60 m³"));
}

fn ring(wall: f64) -> Conduction {
    let body = Body { inner_diameter: 0.06, outer_diameter: 0.06 + 2.0 * wall, length: 0.06 };
    let steel = Substance::constant(50.0, 7800.0, 500.0).unwrap();
    let around = Surroundings::all_round(473.15, Film::Constant(40.0));
    Conduction::new(body, steel, around, 293.15).unwrap().with_rings(4).unwrap()
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(12))]

    #[test]
    fn a_thicker_hub_never_soaks_faster(wall in 5e-3..60e-3_f64, more in 1e-4..30e-3_f64) {
        let (thin, thick) = (soak(&ring(wall)).unwrap(), soak(&ring(wall + more)).unwrap());
        prop_assert!(thick.to_90_percent.value >= thin.to_90_percent.value);
        prop_assert!(thick.to_99_percent.value >= thin.to_99_percent.value);
    }
}

#[test]
fn every_material_that_can_be_heated_has_the_properties_for_it() {
    let library = Library::built_in();
    for material in ["C45+N", "42CrMo4+QT", "EN-GJL-250", "EN-GJS-400-15", "CuSn12-C-GC", "EN-AW-6061-T6"] {
        let found = library.find(material).unwrap();
        assert!(found.conductivity.is_some() && found.specific_heat.is_some(), "{material}");
    }
}
