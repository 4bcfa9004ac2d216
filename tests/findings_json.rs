//! The findings as JSON, of every example: names, nulls, the second way to each number.

mod common;

use std::process::Command;

use serde_json::Value;

/// The JSON of an example, and its text.
fn checked(path: &std::path::Path, set: &[&str]) -> (Value, String) {
    let mut command = Command::new(env!("CARGO_BIN_EXE_hubgrip"));
    command.arg("check").arg("--json").arg(path);
    for change in set {
        command.args(["--set", change]);
    }
    let output = command.output().expect("the program runs");
    let text = String::from_utf8(output.stdout).expect("JSON is UTF-8");
    let told = String::from_utf8_lossy(&output.stderr);
    (serde_json::from_str(&text).unwrap_or_else(|error| panic!("{path:?}: {error}: {told}")), text)
}

/// The last names of all nulls.
fn nulls(value: &Value, name: &str, found: &mut Vec<String>) {
    match value {
        Value::Null => found.push(name.to_owned()),
        Value::Array(items) => items.iter().for_each(|item| nulls(item, name, found)),
        Value::Object(members) => members.iter().for_each(|(name, member)| nulls(member, name, found)),
        _ => {}
    }
}

#[test]
fn every_null_has_a_sentence_and_nothing_else_is_missing() {
    for path in common::examples() {
        let (found, text) = checked(&path, &[]);
        assert!(text.ends_with("}\n"), "{path:?}");
        let notes: Vec<&str> = found["notes"].as_array().unwrap().iter().filter_map(Value::as_str).collect();
        let mut names = Vec::new();
        nulls(&found, "", &mut names);
        for name in names {
            let told = notes.iter().any(|note| note.contains(&format!("{name} is null")));
            assert!(told, "{path:?}: no sentence for {name}");
        }
        for note in notes {
            assert!(note.ends_with('.'), "{path:?}: {note}");
            assert!(!note.contains("not a finite number"), "{path:?}: {note}");
        }
    }
}

#[test]
fn the_names_of_shaft_and_hub_say_what_the_rings_say() {
    for path in common::examples() {
        let (found, _) = checked(&path, &[]);
        for pair in ["loosest", "mean", "tightest"] {
            let pair = &found["extremes"][pair];
            let rings = pair["rings"].as_array().unwrap();
            let (shaft, hub) = (&rings[0], &rings[rings.len() - 1]);
            assert_eq!(pair["hub_bore_hoop_mpa"], hub["bore_hoop_mpa"], "{path:?}");
            assert_eq!(pair["hub_bore_radial_mpa"], hub["bore_radial_mpa"], "{path:?}");
            assert_eq!(pair["hub_bore_von_mises_mpa"], hub["bore_von_mises_mpa"], "{path:?}");
            assert_eq!(pair["hub_rim_hoop_mpa"], hub["rim_hoop_mpa"], "{path:?}");
            assert_eq!(pair["shaft_surface_hoop_mpa"], shaft["rim_hoop_mpa"], "{path:?}");
            assert_eq!(pair["shaft_bore_hoop_mpa"], shaft["bore_hoop_mpa"], "{path:?}");
            let faces = ["bore_von_mises_mpa", "rim_von_mises_mpa"].map(|name| shaft[name].as_f64().unwrap());
            assert_eq!(pair["shaft_von_mises_mpa"], faces[0].max(faces[1]), "{path:?}");
            assert_eq!(pair["interfaces"].as_array().unwrap().len() + 1, rings.len(), "{path:?}");
        }
    }
}

/// Limits and interference meet: shaft lower less hole upper, shaft upper less hole lower (ISO 286-1:2010, 3.3).
#[test]
fn interference_follows_from_the_limits() {
    for path in common::examples() {
        let (found, _) = checked(&path, &[]);
        let limit = |member: &str, name: &str| found["fit"][member][name].as_f64().unwrap();
        let of = |pair: &str| found["extremes"][pair]["interfaces"][0]["interference_um"].as_f64().unwrap();
        let loosest = limit("shaft", "lower_um") - limit("hole", "upper_um");
        let tightest = limit("shaft", "upper_um") - limit("hole", "lower_um");
        approx::assert_abs_diff_eq!(of("loosest"), loosest, epsilon = 1e-6);
        approx::assert_abs_diff_eq!(of("tightest"), tightest, epsilon = 1e-6);
    }
}

/// Balance of forces on half a ring under inner and outer pressure at rest: with radii a and b the hoop stress
/// carries p_i·a − p_o·b, and for an elastic ring hoop plus radial stress is the same at both faces (Lamé).
#[test]
fn hoop_and_radial_stress_add_up_alike_at_both_faces() {
    for path in common::examples() {
        let (found, _) = checked(&path, &[]);
        if !found["service"]["plastic"].is_null() {
            continue;
        }
        for ring in found["extremes"]["tightest"]["rings"].as_array().unwrap() {
            let value = |name: &str| ring[name].as_f64().unwrap();
            let bore = value("bore_hoop_mpa") + value("bore_radial_mpa");
            let rim = value("rim_hoop_mpa") + value("rim_radial_mpa");
            approx::assert_abs_diff_eq!(bore, rim, epsilon = 1e-9 * (1.0 + bore.abs()));
        }
    }
}

#[test]
fn the_same_joint_gives_the_same_bytes() {
    for path in common::examples() {
        assert_eq!(checked(&path, &[]).1, checked(&path, &[]).1, "{path:?}");
    }
}

#[test]
fn a_duty_without_load_has_no_slip_safety_and_says_so() {
    let path =
        common::examples().into_iter().find(|path| path.ends_with("fan-hub.yaml")).expect("the example");
    let (found, _) = checked(&path, &["duty.rated.torque=0 N.m", "duty.rated.axial_force=0 N"]);
    assert!(found["duty"][0]["loosest"]["slip_safety"].is_null());
    let notes = found["notes"].to_string();
    assert!(
        notes.contains("slip_safety is null where a state has neither torque nor axial force."),
        "{notes}"
    );
}
