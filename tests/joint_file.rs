//! The joint file: every key and every default reach the joint.

mod joint_support;

use hubgrip::joint::{Bath, Method, SmoothingAt};
use hubgrip::material::Kind;
use hubgrip::mechanics::criteria::DuctileCriterion;
use hubgrip::quantity::UnitSystem;
use joint_support::{FULL, LEAST, faults, joint};

#[test]
fn every_key_reaches_the_joint() {
    let joint = joint(FULL);
    assert_eq!(joint.title, "Demo hub");
    assert_eq!(joint.drawing.as_deref(), Some("D-12.50 rev 007"));
    assert_eq!(joint.note.as_deref(), Some("two lines are not needed"));
    assert_eq!(joint.date.as_deref(), Some("2026-01-31"));
    assert_eq!((joint.diameter, joint.length, joint.relief), (0.060, 0.070, 0.003));
    let [shaft, hub] = &joint.rings[..] else { panic!("two rings") };
    assert_eq!((shaft.name.as_str(), hub.name.as_str()), ("pin", "web"));
    assert_eq!((shaft.inner_diameter, shaft.outer_diameter), (0.020, 0.060));
    assert_eq!((hub.inner_diameter, hub.outer_diameter), (0.060, 0.110));
    assert_eq!((shaft.section, hub.section), (0.020, 0.025));
    assert_eq!((shaft.roughness.value, hub.roughness.value), (6.3e-6, 6.0 * 1.6e-6));
    assert_eq!(hub.material.kind, Kind::Brittle);
    // ISO 286-2: 60 H7 +30/0, 60 s6 +72/+53.
    let limits = joint.fits[0].limits;
    assert_eq!((limits.hole.lower, limits.hole.upper), (0.0, 30e-6));
    assert_eq!((limits.shaft.lower, limits.shaft.upper), (53e-6, 72e-6));
    assert_eq!((joint.friction.holding.value.low, joint.friction.holding.value.high), (0.12, 0.12));
    assert_eq!((joint.friction.pressing.value.low, joint.friction.pressing.value.high), (0.08, 0.14));
    assert_eq!((joint.friction.release.value.low, joint.friction.release.value.high), (0.1, 0.2));
    assert_eq!(joint.duty[0].name, "rated");
    assert_eq!((joint.duty[0].torque, joint.duty[0].axial_force), (900.0, 2000.0));
    assert_eq!(joint.duty[0].temperatures, [333.15, 318.15]);
    assert_eq!(joint.duty[1].temperatures, [313.15, 313.15]);
    assert_eq!(joint.assembly.method, Method::HeatAndChill);
    assert_eq!(joint.assembly.bath, Bath::LiquidNitrogen);
    assert_eq!((joint.assembly.shop_temperature, joint.assembly.clearance.value), (298.15, 50e-6));
    assert!((joint.assembly.chamfer_angle.value.to_degrees() - 10.0).abs() < 1e-12);
    assert_eq!(joint.assembly.hub_temperature_limit, Some(473.15));
    assert_eq!((joint.smoothing.factor, joint.smoothing.at), (Some(0.4), SmoothingAt::Both));
    assert!((joint.smoothing.loss[0] - 0.4 * (6.3e-6 + 9.6e-6)).abs() < 1e-15);
    assert_eq!(joint.criterion, DuctileCriterion::Tresca);
    assert_eq!((joint.require.slip_safety, joint.require.yield_safety), (1.4, 1.1));
    assert_eq!((joint.require.fracture_safety, joint.require.press_force), (2.2, Some(300e3)));
    assert_eq!(joint.display, UnitSystem::Inch);
    let taken: Vec<&str> = joint.defaults.iter().map(|default| default.key.as_str()).collect();
    assert_eq!(
        taken,
        [
            "duty.idle.torque",
            "duty.idle.axial_force",
            "assembly.medium",
            "assembly.form_error",
            "assembly.handling_allowance",
            "assembly.transfer_time",
            "assembly.vessel",
            "assembly.humidity",
            "assembly.temperature_lag",
        ]
    );
    assert!(joint.remarks.iter().any(|remark| remark.contains("Ra 1.6 um") && remark.contains("Rz 9.6 um")));
}

#[test]
fn every_silent_key_leaves_a_default_with_its_source() {
    let joint = joint(LEAST);
    let taken: Vec<(&str, &str)> =
        joint.defaults.iter().map(|default| (default.key.as_str(), default.value.as_str())).collect();
    assert_eq!(
        taken,
        [
            ("relief", "0 mm"),
            ("shaft.bore", "0 mm"),
            ("shaft.roughness", "Rz 6.3 um"),
            ("shaft.section", "60 mm"),
            ("hub.roughness", "Rz 10 um"),
            ("hub.section", "25 mm"),
            ("friction.lubrication", "oiled"),
            ("friction.holding", "0.06 to 0.13"),
            ("friction.pressing", "0.05 to 0.22"),
            ("friction.release", "0.07 to 0.2"),
            ("duty", "[{state: shop}]"),
            ("assembly.method", "press"),
            ("assembly.shop_temperature", "20 degC"),
            ("assembly.clearance", "60 um"),
            ("assembly.chamfer_angle", "5 deg"),
            ("assembly.bath", "dry ice"),
            ("assembly.temperature_lag", "0.5"),
            ("smoothing.factor", "0.8"),
            ("smoothing.at", "loosest"),
            ("criterion", "von Mises"),
            ("require.slip_safety", "1.5"),
            ("require.yield_safety", "1.2"),
            ("require.fracture_safety", "2.5"),
            ("require.allow", "elastic"),
            ("display", "metric"),
        ]
    );
    assert!(joint.defaults.iter().all(|default| !default.source.is_empty()));
    assert_eq!(joint.duty[0].temperatures, [293.15, 293.15]);
    assert_eq!(joint.assembly.clearance.value, 60e-6);
    assert_eq!(joint.smoothing.at, SmoothingAt::Loosest);
    assert!(joint.smoothing.rule.starts_with("DIN 7190:2001"), "{}", joint.smoothing.rule);
}

#[test]
fn a_default_written_into_the_file_changes_nothing() {
    let silent = joint(LEAST);
    let mut text = LEAST.to_owned();
    for (section, key) in [("shaft", "shaft"), ("hub", "hub")] {
        for default in &silent.defaults {
            if let Some((owner, name)) = default.key.split_once('.')
                && owner == key
            {
                text = text.replacen(
                    &format!("{section}: {{"),
                    &format!("{section}: {{{name}: {}, ", default.value),
                    1,
                );
            }
        }
    }
    for section in ["friction", "assembly", "smoothing", "require"] {
        text.push_str(&format!("{section}:\n"));
        for default in &silent.defaults {
            if let Some((owner, name)) = default.key.split_once('.')
                && owner == section
            {
                text.push_str(&format!("  {name}: {}\n", default.value));
            }
        }
    }
    for default in silent.defaults.iter().filter(|default| !default.key.contains('.')) {
        text.push_str(&format!("{}: {}\n", default.key, default.value));
    }
    let spoken = joint(&text);
    assert_eq!(spoken.friction.holding.value, silent.friction.holding.value);
    assert_eq!(spoken.friction.release.value, silent.friction.release.value);
    assert_eq!(spoken.assembly.clearance.value, silent.assembly.clearance.value);
    assert_eq!(spoken.assembly.chamfer_angle.value, silent.assembly.chamfer_angle.value);
    assert_eq!(spoken.smoothing.loss, silent.smoothing.loss);
    assert_eq!(spoken.rings[0].strength, silent.rings[0].strength);
    assert_eq!(spoken.rings[1].section, silent.rings[1].section);
    assert_eq!(spoken.duty, silent.duty);
    assert_eq!(spoken.require, silent.require);
    let keys: Vec<&str> = spoken.defaults.iter().map(|default| default.key.as_str()).collect();
    assert_eq!(
        keys,
        [
            "duty.shop.torque",
            "duty.shop.axial_force",
            "duty.shop.shaft_temperature",
            "duty.shop.hub_temperature"
        ]
    );
}

#[test]
fn fits_in_every_form_are_read() {
    let limits = |fit: &str| {
        let limits = joint(&LEAST.replacen("fit: H7/u6", &format!("fit: {fit}"), 1)).fits[0].limits;
        [limits.hole.lower, limits.hole.upper, limits.shaft.lower, limits.shaft.upper]
            .map(|deviation| (deviation * 1e9).round() / 1e3)
    };
    // ISO 286-2: 60 H7 +30/0, 60 s6 +72/+53, 60 S7 −42/−72, 60 h6 0/−19.
    assert_eq!(limits("H7/s6"), [0.0, 30.0, 53.0, 72.0]);
    assert_eq!(limits("S7/h6"), [-72.0, -42.0, -19.0, 0.0]);
    assert_eq!(limits("{hole: H7, shaft: s6}"), [0.0, 30.0, 53.0, 72.0]);
    assert_eq!(limits("{hole: H7, shaft: {lower: 53 um, upper: 0.072 mm}}"), [0.0, 30.0, 53.0, 72.0]);
    assert_eq!(limits("{hole: {min: 60 mm, max: 60.03 mm}, shaft: s6}"), [0.0, 30.0, 53.0, 72.0]);
    assert_eq!(limits("{hole: ±10 um, shaft: +30 / -10 um}"), [-10.0, 10.0, -10.0, 30.0]);
    assert_eq!(
        limits("{measured: {hole: 60.012 mm, shaft: 60.061 mm, uncertainty: 2 um}}"),
        [10.0, 14.0, 59.0, 63.0]
    );
    assert_eq!(
        limits("{measured: {hole: 60.012 mm ± 2 um, shaft: 60.061 mm ± 2 um}}"),
        [10.0, 14.0, 59.0, 63.0]
    );
    // ANSI B4.1, FN 4 over 1.97 to 2.56 in: hole 0 to +1.2, shaft +3.5 to +4.2 thousandths of an inch.
    let thou = |value: f64| (value * 25.4 * 1e3).round() / 1e3;
    let text = LEAST.replacen("60 mm", "2 in", 1).replacen("H7/u6", "FN 4", 1);
    let found = joint(&text).fits[0].limits;
    assert_eq!((found.hole.upper * 1e9).round() / 1e3, thou(1.2));
    assert_eq!((found.shaft.upper * 1e9).round() / 1e3, thou(4.2));
    assert!(joint(&text).remarks.is_empty());
    assert!(joint(&LEAST.replacen("H7/u6", "FN 4", 1)).remarks[0].contains("2.362205 in"));
}

#[test]
fn material_numbers_keep_their_zeros() {
    // EN 10025-2: E335 is 1.0060, which YAML alone would read as the number 1.006.
    let joint = joint(&LEAST.replacen("C45+N", "1.0060", 1));
    assert_eq!(joint.rings[0].material.id, "E335");
}

#[test]
fn texts_that_look_like_numbers_stay_as_typed() {
    let joint = joint(&format!("{LEAST}title: 1e3\ndrawing: 12.50\nnote: 0x1F\ndate: 010\n"));
    assert_eq!(joint.title, "1e3");
    assert_eq!(joint.drawing.as_deref(), Some("12.50"));
    assert_eq!(joint.note.as_deref(), Some("0x1F"));
    assert_eq!(joint.date.as_deref(), Some("010"));
}

#[test]
fn smoothing_rules_go_by_name() {
    let loss = |smoothing: &str| {
        let joint = joint(&format!("{LEAST}smoothing: {smoothing}\n"));
        ((joint.smoothing.loss[0] * 1e9).round() / 1e3, joint.smoothing.at)
    };
    // Rz 6.3 and 10 µm by default: 0.8 · 16.3 = 13.04, 0.4 · 16.3 = 6.52.
    assert_eq!(loss("DIN 7190:2001"), (13.04, SmoothingAt::Loosest));
    assert_eq!(loss("DIN 7190-1:2017"), (6.52, SmoothingAt::Loosest));
    assert_eq!(loss("{rule: DIN 7190-1:2017, at: both}"), (6.52, SmoothingAt::Both));
    assert_eq!(loss("{factor: 0.4}"), (6.52, SmoothingAt::Loosest));
    assert_eq!(loss("none").1, SmoothingAt::None);
    let found = faults(&format!("{LEAST}smoothing: {{factor: 0.4, rule: GB/T 5371}}\n"));
    assert_eq!(found[0].message, "`factor` and `rule` are both given");
    let found = faults(&format!("{LEAST}smoothing: {{factor: 80}}\n"));
    assert!(found[0].message.starts_with("factor 80 is too large"));
}
