//! The keys of `assembly` for oven, bath, room and handling: what is read, what is refused, what is said.

mod joint_support;

use joint_support::{case, check, joint};

use hubgrip::joint::practice::{Heating, Practice, Room, Vessel};

/// Every key of the practice. Invented demo data.
const ALL: &str = "\
joint_file: 1
diameter: 60 mm
length: 70 mm
shaft: {material: C45+N}
hub: {material: C45+QT, outer_diameter: 110 mm}
fit: H7/u6
assembly:
  method: heat and chill
  bath: liquid nitrogen
  medium: oil bath
  oven_temperature: 150 degC
  clearance: 50 um
  form_error: 8 um
  handling_allowance: 12 um
  handling_time: 30 s
  transfer_time: 0.2 min
  chilled_length: 90 mm
  room: {volume: 60 m3, air_changes: 4}
  vessel: {volume: 3 l, hourly_loss: 0.1 l}
  humidity: 0.7
  temperature_lag: 0.6
";

#[test]
fn every_key_is_read_in_si() {
    let plan = joint(ALL).assembly;
    let wanted = Practice {
        heating: Heating::OilBath,
        oven_temperature: Some(423.15),
        form_error: 8e-6,
        handling_allowance: 12e-6,
        handling_time: Some(30.0),
        transfer_time: 12.0,
        room: Some(Room { volume: 60.0, air_changes: 4.0 }),
        vessel: Some(Vessel { volume: 0.003, hourly_loss: Some(0.0001) }),
        chilled_length: Some(0.09),
        humidity: 0.7,
        temperature_lag: 0.6,
    };
    assert_eq!(plan.practice, wanted);
    assert!((plan.clearance_to_open() - 70e-6).abs() < 1e-15);
}

#[test]
fn wrong_values_are_refused_at_their_place() {
    check(
        ALL,
        &[
            case(
                ("medium: oil bath", "medium: oil bahth"),
                (10, 11, 9),
                "`oil bahth` is not a way of heating",
                "did you mean `oil bath`?",
            ),
            case(
                ("bath: liquid nitrogen", "bath: dry ice in alcohl"),
                (9, 9, 17),
                "`dry ice in alcohl` is not a cold bath",
                "did you mean `dry ice in alcohol`?",
            ),
            case(
                ("oven_temperature: 150 degC", "oven_temperature: 10 degC"),
                (11, 21, 7),
                "oven_temperature 10 degC is not above the shop temperature",
                "",
            ),
            case(
                ("form_error: 8 um", "form_error: -8 um"),
                (13, 15, 5),
                "form_error -8 um must not be negative",
                "",
            ),
            case(
                ("handling_allowance: 12 um", "handling_allowance: -1 um"),
                (14, 23, 5),
                "handling_allowance -1 um must not be negative",
                "",
            ),
            case(
                ("handling_time: 30 s", "handling_time: 30"),
                (15, 18, 2),
                "30 has no unit: write 30 s",
                "a time",
            ),
            case(
                ("handling_time: 30 s", "handling_time: 0 s"),
                (15, 18, 3),
                "handling_time 0 s must be more than zero",
                "",
            ),
            case(
                ("handling_time: 30 s", "handling_time: 900 h"),
                (15, 18, 5),
                "handling_time 900 h is more than a week",
                "",
            ),
            case(
                ("transfer_time: 0.2 min", "transfer_time: -1 s"),
                (16, 18, 4),
                "transfer_time -1 s must not be negative",
                "",
            ),
            case(
                ("chilled_length: 90 mm", "chilled_length: 0 mm"),
                (17, 19, 4),
                "chilled_length 0 mm must be more than zero",
                "",
            ),
            case(("volume: 60 m3", "volume: 0 m3"), (18, 18, 4), "volume 0 m3 must be more than zero", ""),
            case(
                ("air_changes: 4", "air_changes: -4"),
                (18, 38, 2),
                "air_changes -4 must not be negative",
                "",
            ),
            case(
                ("volume: 60 m3, ", ""),
                (18, 3, 4),
                "`volume` is missing in `assembly.room`",
                "volume: 60 m3",
            ),
            case(("volume: 3 l", "volume: -3 l"), (19, 20, 4), "volume -3 l must be more than zero", ""),
            case(
                ("hourly_loss: 0.1 l", "hourly_loss: -0.1 l"),
                (19, 38, 6),
                "hourly_loss -0.1 l must not be negative",
                "",
            ),
            case(
                ("humidity: 0.7", "humidity: 70"),
                (20, 13, 2),
                "humidity 70 must be from 0 (dry) to 1 (saturated), such as 0.5 for 50 %",
                "",
            ),
            case(
                ("temperature_lag: 0.6", "temperature_lag: 1.2"),
                (21, 20, 3),
                "temperature_lag 1.2 must be from 0 (both warm alike) to 1 (the shaft stays cold)",
                "",
            ),
        ],
    );
}

#[test]
fn an_oven_beyond_the_expansion_curve_is_refused() {
    let text = ALL.replace("oven_temperature: 150 degC", "oven_temperature: 2000 degC");
    let faults = joint_support::faults(&text);
    assert_eq!(faults.len(), 1, "{}", joint_support::listed(&faults));
    assert!(faults[0].message.contains("is outside the expansion curve of C45+QT (hub), which ends at"));
}

#[test]
fn keys_that_the_method_does_not_use_are_told() {
    let remarks = joint(&ALL.replace("heat and chill", "press")).remarks;
    for key in [
        "medium",
        "oven_temperature",
        "handling_time",
        "transfer_time",
        "form_error",
        "handling_allowance",
        "room",
        "vessel",
        "chilled_length",
        "humidity",
    ] {
        let told = format!("The key assembly.{key} is not used");
        assert!(remarks.iter().any(|remark| remark.starts_with(&told)), "{key}: {remarks:#?}");
    }
    assert!(joint(ALL).remarks.is_empty(), "{:#?}", joint(ALL).remarks);
}

#[test]
fn what_the_file_does_not_say_is_a_default_with_its_source() {
    let silent = "  method: heat and chill\n";
    let head = ALL.split("  method").next().unwrap();
    let joint = joint(&format!("{head}{silent}"));
    for key in [
        "medium",
        "form_error",
        "handling_allowance",
        "transfer_time",
        "vessel",
        "humidity",
        "temperature_lag",
    ] {
        let key = format!("assembly.{key}");
        let default = joint.defaults.iter().find(|default| default.key == key);
        assert!(default.is_some_and(|default| !default.source.is_empty()), "{key}");
    }
    assert_eq!(joint.assembly.practice, Practice::default());
}
