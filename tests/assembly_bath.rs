//! Dry ice in alcohol or acetone: asked for in the joint file, worked by a heat balance, told everywhere.

mod common;

use std::f64::consts::FRAC_PI_4;
use std::path::Path;

use approx::assert_relative_eq;
use common::{findings_of, hubgrip_in, stdout};
use hubgrip::findings::{Findings, bath_temperature, worksheet};
use hubgrip::joint::Bath;
use serde_json::Value;

/// A bronze bush of 60/48 mm, 55 mm long; invented demo data.
fn joint(bath: &str, more: &str) -> String {
    format!(
        "joint_file: 1\ndiameter: 60 mm\nlength: 55 mm\nshaft: {{material: CuSn12-C-GC, bore: 48 mm, roughness: Rz 4 um}}\n\
         hub: {{material: S355J2, outer_diameter: 115 mm, roughness: Rz 6.3 um}}\nfit: H7/r6\nfriction: 0.12\n\
         assembly:\n  method: chill shaft\n  bath: {bath}\n  clearance: 25 um\n  vessel: {{volume: 1.2 l}}\n{more}"
    )
}

fn said(findings: &Findings, words: &str) -> bool {
    findings.cautions.iter().any(|caution| caution.text.contains(words))
}

/// Acetone −78 °C (CRC Handbook 2005, p. 15-35), ethanol −72 °C (Lee and Jensen 2000), dry ice −78.5 °C.
#[test]
fn the_liquid_sets_the_temperature() {
    for (word, bath, celsius) in [
        ("dry ice", Bath::DryIce, -78.5),
        ("dry ice in alcohol", Bath::DryIceInAlcohol, -72.0),
        ("dry ice in acetone", Bath::DryIceInAcetone, -78.0),
    ] {
        assert_relative_eq!(bath_temperature(bath) - 273.15, celsius, epsilon = 1e-9);
        let found = findings_of(&joint(word, ""));
        let own = found.assembly.baths.iter().find(|found| found.bath == bath).unwrap();
        let strain = found.joint.rings[0].material.expansion.strain(own.temperature).unwrap();
        assert_relative_eq!(own.shrinkage.unwrap(), -(0.06 + 60e-6) * strain, max_relative = 1e-9);
        assert_eq!(found.assembly.baths.len(), 2);
        let (_, drifts) = worksheet::worked(&found);
        assert!(drifts.is_empty(), "{word}: {drifts:#?}");
    }
}

/// Heat balance by hand: liquid of the vessel less the bush, 2.2 and 2.1 kJ/(kg·K) over 92 K and 98 K, 571 kJ/kg of ice.
#[test]
fn the_ice_cools_part_and_liquid() {
    let bush = FRAC_PI_4 * (0.06f64.powi(2) - 0.048f64.powi(2)) * 0.055;
    for (word, density, heat, fall) in
        [("dry ice in alcohol", 789.0, 2200.0, 92.0), ("dry ice in acetone", 791.0, 2100.0, 98.0)]
    {
        let found = findings_of(&joint(word, "  room: {volume: 40 m3}\n"));
        let bath = found.assembly.cold_bath.as_ref().unwrap();
        let liquid = bath.liquid.unwrap();
        assert_relative_eq!(liquid.volume, 1.2e-3 - bush, max_relative = 1e-9);
        assert_relative_eq!(liquid.mass, density * liquid.volume, max_relative = 1e-12);
        assert_relative_eq!(liquid.ice.mass, liquid.mass * heat * fall / 571e3, max_relative = 1e-9);
        let soak = found.assembly.times.shaft.as_ref().unwrap();
        assert_relative_eq!(bath.job.part.mass, soak.heat / 571e3, max_relative = 1e-6);
        let gone = bath.job.part.mass + bath.job.idle.mass + liquid.ice.mass;
        assert_relative_eq!(bath.job.boiled.mass, gone, max_relative = 1e-12);
        assert_relative_eq!(bath.to_bring.0, 1.2 * gone, max_relative = 1e-12);
        assert_relative_eq!(bath.to_bring.1, 2.0 * gone, max_relative = 1e-12);
        // 1.84 kg/m³ of gas at 20 °C, mixed with the air of a closed room.
        let share = 1.0 - (-gone / 1.84 / 40.0f64).exp();
        assert_relative_eq!(bath.room.unwrap().carbon_dioxide.unwrap(), share, max_relative = 1e-9);
    }
}

/// A lump in a constant film: t = ρ c V/(h A) ln(step/rest); 200 against 20 W/(m²·K), so that the bath is ten times as fast
/// (Bi = 200 × 6 mm/2/50 < 0.02).
#[test]
fn a_part_is_cold_ten_times_as_soon_as_in_packed_ice() {
    let soak = |word: &str| findings_of(&joint(word, "")).assembly.times.shaft.unwrap().marks[2];
    let (packed, wetted) = (soak("dry ice"), soak("dry ice in acetone"));
    assert!((9.0..11.0).contains(&(packed / wetted)), "{packed} {wetted}");
    let found = findings_of(&joint("dry ice in acetone", ""));
    let soak = found.assembly.times.shaft.as_ref().unwrap();
    let ends = 2.0 * FRAC_PI_4 * (0.06f64.powi(2) - 0.048f64.powi(2));
    let area = std::f64::consts::PI * (0.06 + 0.048) * 0.055 + ends;
    let capacity = soak.heat / 98.0;
    assert_relative_eq!(soak.marks[2], capacity / (200.0 * area) * 100f64.ln(), max_relative = 0.05);
}

#[test]
fn what_burns_and_foams_is_told() {
    for (word, flash) in [("dry ice in alcohol", "12 °C"), ("dry ice in acetone", "-20 °C")] {
        let found = findings_of(&joint(word, ""));
        assert!(said(&found, &format!("flash point of {flash}")), "{word}: {:#?}", found.cautions);
        assert!(said(&found, "foams over") && said(&found, "carbon dioxide") && !said(&found, "must be dry"));
    }
    let hot = findings_of(
        &joint("dry ice in acetone", "").replace("chill shaft", "heat and chill").replace("25 um", "60 um"),
    );
    assert!(said(&hot, "The hub is hot: the part must be dry"));
    let packed = findings_of(&joint("dry ice", ""));
    assert!(!said(&packed, "foams over") && !said(&packed, "flammable"));
    assert!(packed.assembly.cold_bath.unwrap().liquid.is_none());
}

#[test]
fn terminal_json_and_report_tell_it() {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("examples");
    let text = stdout(&hubgrip_in(&folder, &["check", "bush-in-alcohol.yaml"])).replace("\n  ", " ");
    assert!(text.contains("of alcohol for a bath of 1.2 l round the part."), "{text}");
    assert!(text.contains("when the alcohol has stopped foaming; flash point 12 °C."), "{text}");
    assert!(text.contains("Carbon dioxide would be") && !text.contains("spilled bath"), "{text}");
    let json = stdout(&hubgrip_in(&folder, &["check", "--json", "bush-in-alcohol.yaml"]));
    let json: Value = serde_json::from_str(&json).unwrap();
    let bath = &json["assembly"]["cold_bath"];
    assert_eq!(
        (bath["bath"].as_str(), bath["liquid"].as_str()),
        (Some("dry ice in alcohol"), Some("alcohol"))
    );
    assert!(bath["boiled_by_liquid_kg"].as_f64().unwrap() > bath["boiled_by_part_kg"].as_f64().unwrap());
    assert_relative_eq!(bath["liquid_flash_point_c"].as_f64().unwrap(), 12.0, epsilon = 1e-9);
    let page = stdout(&hubgrip_in(&folder, &["report", "bush-in-alcohol.yaml", "-o", "-"]));
    assert!(page.contains("dry ice that cools the alcohol") && page.contains("foams over"));
    let schema = stdout(&hubgrip_in(&folder, &["schema"]));
    assert!(schema.contains("\"dry ice in acetone\""), "the schema knows the words");
}
