use proptest::prelude::*;

use super::*;

/// Spellings with what they mean in SI; also the documentation of what is accepted.
///
/// Inch and pound values follow from 1 in = 25.4 mm, 1 lb = 0.45359237 kg and g = 9.80665 m/s², worked out in
/// whole numbers; Btu values are those of NIST SP 811 (2008), appendix B.8.
const ACCEPTED: &[(Kind, &str, f64)] = &[
    (Kind::Length, "60 mm", 0.06),
    (Kind::Length, "60mm", 0.06),
    (Kind::Length, "  60.0   mm ", 0.06),
    (Kind::Length, "60. mm", 0.06),
    (Kind::Length, "+6e1 mm", 0.06),
    (Kind::Length, "60\u{a0}mm", 0.06),
    (Kind::Length, "60\u{202f}mm", 0.06),
    (Kind::Length, "1.5e-3 mm", 1.5e-6),
    (Kind::Length, "-25 um", -25e-6),
    (Kind::Length, "\u{2212}25 um", -25e-6),
    (Kind::Length, "25 \u{b5}m", 25e-6),
    (Kind::Length, "25 \u{3bc}m", 25e-6),
    (Kind::Length, "6 cm", 0.06),
    (Kind::Length, "0.06 m", 0.06),
    (Kind::Length, "50 nm", 50e-9),
    (Kind::Length, "1.5 in", 0.0381),
    (Kind::Length, "1.5\"", 0.0381),
    (Kind::Length, ".5 inch", 0.0127),
    (Kind::Length, "2-3/16 in", 0.0555625),
    (Kind::Length, "2 3/16 in", 0.0555625),
    (Kind::Length, "-2-3/16 in", -0.0555625),
    (Kind::Length, "3/8 in", 0.009525),
    (Kind::Length, "1 1/2 ft", 0.4572),
    (Kind::Length, "1 thou", 25.4e-6),
    (Kind::Length, "1 mil", 25.4e-6),
    (Kind::Length, "32 µin", 812.8e-9),
    (Kind::Force, "2 kN", 2000.0),
    (Kind::Force, "2 MN", 2e6),
    (Kind::Force, "1 lbf", 4.4482216152605),
    (Kind::Force, "1 kip", 4448.2216152605),
    (Kind::Torque, "900 N.m", 900.0),
    (Kind::Torque, "900 N·m", 900.0),
    (Kind::Torque, "900 N · m", 900.0),
    (Kind::Torque, "900 N*m", 900.0),
    (Kind::Torque, "900 N m", 900.0),
    (Kind::Torque, "900 Nm", 900.0),
    (Kind::Torque, "0.9 kN.m", 900.0),
    (Kind::Torque, "900 N.mm", 0.9),
    (Kind::Torque, "1 lbf.ft", 1.3558179483314004),
    (Kind::Torque, "1 ft-lbf", 1.3558179483314004),
    (Kind::Torque, "1 lb.ft", 1.3558179483314004),
    (Kind::Torque, "12 lbf in", 1.3558179483314004),
    (Kind::Pressure, "210 GPa", 210e9),
    (Kind::Pressure, "355 N/mm2", 355e6),
    (Kind::Pressure, "355 N/mm²", 355e6),
    (Kind::Pressure, "355 N/mm^2", 355e6),
    (Kind::Pressure, "6 bar", 6e5),
    (Kind::Pressure, "1 psi", 6894.757293168361),
    (Kind::Pressure, "30 ksi", 206842718.79505083),
    (Kind::Pressure, "30 Mpsi", 206842718795.05083),
    (Kind::Temperature, "20 degC", 293.15),
    (Kind::Temperature, "20 °C", 293.15),
    (Kind::Temperature, "20 ℃", 293.15),
    (Kind::Temperature, "20 C", 293.15),
    (Kind::Temperature, "293.15 K", 293.15),
    (Kind::Temperature, "68 degF", 293.15),
    (Kind::Temperature, "68 °F", 293.15),
    (Kind::Temperature, "-459.67 degF", 0.0),
    (Kind::Temperature, "-273.15 degC", 0.0),
    (Kind::Temperature, "-196 degC", 77.15),
    (Kind::TemperatureDifference, "100 degF", 55.55555555555556),
    (Kind::TemperatureDifference, "40 degC", 40.0),
    (Kind::TemperatureDifference, "-40 K", -40.0),
    (Kind::Speed, "60 rpm", std::f64::consts::TAU),
    (Kind::Speed, "60 1/min", std::f64::consts::TAU),
    (Kind::Speed, "1 1/s", std::f64::consts::TAU),
    (Kind::Speed, "1 rad/s", 1.0),
    (Kind::Velocity, "2 mm/s", 0.002),
    (Kind::Mass, "1 lb", 0.45359237),
    (Kind::Mass, "1 t", 1000.0),
    (Kind::Time, "30 min", 1800.0),
    (Kind::Time, "1.5 h", 5400.0),
    (Kind::Time, "20 ms", 0.02),
    (Kind::Density, "7850 kg/m3", 7850.0),
    (Kind::Density, "7.85 g/cm³", 7850.0),
    (Kind::Density, "1 lb/in3", 27679.904710203125),
    (Kind::Expansion, "11.5e-6 /K", 11.5e-6),
    (Kind::Expansion, "11.5e-6/K", 11.5e-6),
    (Kind::Expansion, "0.0000115 1/K", 11.5e-6),
    (Kind::Expansion, "11.5 um/m.K", 11.5e-6),
    (Kind::Expansion, "11.5 µm/(m·K)", 11.5e-6),
    (Kind::Expansion, "6.5e-6 /degF", 11.7e-6),
    (Kind::Expansion, "6.5 uin/in.degF", 11.7e-6),
    (Kind::Conductivity, "45 W/m.K", 45.0),
    (Kind::Conductivity, "45 W/(m K)", 45.0),
    (Kind::SpecificHeat, "480 J/kg.K", 480.0),
    (Kind::SpecificHeat, "0.48 kJ/kg.K", 480.0),
    (Kind::SpecificHeat, "1 Btu/lb.degF", 4186.8),
    (Kind::HeatTransfer, "20 W/m2.K", 20.0),
    (Kind::Angle, "180 deg", std::f64::consts::PI),
    (Kind::Angle, "5°", 5.0 * std::f64::consts::PI / 180.0),
    (Kind::Volume, "2.5 l", 0.0025),
    (Kind::Volume, "1 US gal", 0.003785411784),
    (Kind::Number, "0.12", 0.12),
    (Kind::Number, "1e-3", 0.001),
];

/// Three roundings of half a bit each: of the number, of its product and of the quotient.
const LAST_BITS: f64 = 1.5 * f64::EPSILON;

#[test]
fn every_accepted_spelling_means_what_the_table_says() {
    for &(kind, text, si) in ACCEPTED {
        let found = parse(kind, text).unwrap_or_else(|error| panic!("{text}: {error}"));
        assert!((found - si).abs() <= LAST_BITS * si.abs(), "{text}: {found} is not {si}");
    }
}

/// Powers of ten are moved on the digits, and an inch is a whole number of tenths of a millimetre.
#[test]
fn what_can_be_exact_is_exact() {
    for hundredths in 0..=30_000 {
        let millimetres = format!("{}.{:02}", hundredths / 100, hundredths % 100);
        let exact: f64 = format!("{millimetres}e-3").parse().unwrap();
        assert_eq!(parse(Kind::Length, &format!("{millimetres} mm")), Ok(exact));
    }
    for sixteenths in 1..16 {
        let text = format!("2-{sixteenths}/16 in");
        assert_eq!(parse(Kind::Length, &text), Ok(f64::from(32 + sixteenths) * 15_875.0 / 1e7), "{text}");
    }
    assert_eq!(parse(Kind::Temperature, "20 degC"), Ok(crate::material::REFERENCE_TEMPERATURE));
    assert_eq!(parse(Kind::Temperature, "68 degF"), Ok(crate::material::REFERENCE_TEMPERATURE));
}

/// Texts that are refused, with a piece of the message or of the help.
const REFUSED: &[(Kind, &str, &str)] = &[
    (Kind::Length, "", "a length is due"),
    (Kind::Length, "  \t", "a length is due"),
    (Kind::Length, "80", "write 80 mm"),
    (Kind::Length, "0", "write 0 mm"),
    (Kind::Length, "1e3", "write 1e3 mm"),
    (Kind::Torque, "900", "write 900 N.m"),
    (Kind::Length, "60 MPa", "a pressure; a length is due (mm, um, in, thou"),
    (Kind::Force, "60 lb", "written lbf"),
    (Kind::Length, "60 Mm", "did you mean mm?"),
    (Kind::Length, "60 MM", "did you mean mm?"),
    (Kind::Length, "60 milimeter", "not a unit"),
    (Kind::Length, "60 m^m", "not a unit"),
    (Kind::Length, "60 (mm)", "not a unit"),
    (Kind::Length, "1,5 mm", "write 1.5 mm"),
    (Kind::Length, "1,500 mm", "write 1.500 mm or 1500 mm"),
    (Kind::Length, "1,000.5 mm", "write 1000.5 mm"),
    (Kind::Length, "1_000 mm", "no grouping"),
    (Kind::Length, "1 000 mm", "no grouping"),
    (Kind::Length, "1\u{a0}000 mm", "no grouping"),
    (Kind::Length, "1'000 mm", "no grouping"),
    (Kind::Length, "1.2.3 mm", "no grouping"),
    (Kind::Length, "0x10 mm", "no grouping"),
    (Kind::Length, "--5 mm", "does not begin with a number"),
    (Kind::Length, "NaN mm", "not a finite number"),
    (Kind::Length, "-inf mm", "not a finite number"),
    (Kind::Number, ".nan", "not a finite number"),
    (Kind::Number, "-.inf", "not a finite number"),
    (Kind::Length, "1e999 mm", "not a finite number"),
    (Kind::Length, "1e99999999999999999999 mm", "not a finite number"),
    (Kind::Length, "1e-999 mm", "too close to zero"),
    (Kind::Length, "1e-323 uin", "too close to zero"),
    (Kind::Pressure, "1e305 Mpsi", "not a finite number"),
    (Kind::Speed, "1e154 rpm", "no number that a part can have"),
    (Kind::Length, "-1.001e18 mm", "no number that a part can have"),
    (Kind::Number, "1.1e15", "check the exponent and the unit"),
    (Kind::Length, "mm", "does not begin with a number"),
    (Kind::Length, "½ in", "does not begin with a number"),
    (Kind::Length, "3/0 in", "not a fraction"),
    (Kind::Length, "9/8 in", "not a fraction"),
    (Kind::Length, "1/2 mm", "not a fraction"),
    (Kind::Number, "1/2", "not a fraction"),
    (Kind::Torque, "900 N.mn", "did you mean"),
    (Kind::Temperature, "-300 degC", "absolute zero"),
    (Kind::Temperature, "-0.1 K", "absolute zero"),
    (Kind::TemperatureDifference, "3 mm", "a temperature difference is due"),
    (Kind::Number, "0.12 mm", "plain number"),
    (Kind::Number, "12 %", "plain number"),
];

#[test]
fn every_refused_text_says_what_would_be_right() {
    for &(kind, text, words) in REFUSED {
        let error = parse(kind, text).expect_err(text);
        let told = format!("{error}; {}", error.help().unwrap_or_default());
        assert!(told.contains(words), "{text}: {told}");
    }
}

#[test]
fn ranges_and_deviations_take_the_unit_from_the_end() {
    let range = |text| parse_range(Kind::Length, text);
    assert_eq!(range("0.08 mm to 0.14 mm"), Ok((80e-6, 140e-6)));
    assert_eq!(range("8\tto  14 um"), Ok((8e-6, 14e-6)));
    assert_eq!(range("900 um to 1 mm"), Ok((900e-6, 1e-3)));
    assert_eq!(parse_number_range("0.08 to 0.14"), Ok((0.08, 0.14)));
    assert_eq!(parse_number_range("0.12"), Ok((0.12, 0.12)));
    for refused in ["14 to 8 um", "8 to", "to 8 um", "8 um to 14", "8 to 14", "1 to 2 to 3 um", "8-14 um"] {
        assert!(range(refused).is_err(), "{refused}");
    }
    let deviations = |text| parse_plus_minus(Kind::Length, text);
    for both in ["±10 um", "± 10 um", "+-10 um", "+/- 10 um", "+10 / -10 um", "-10/+10 um"] {
        assert_eq!(deviations(both), Ok((-10e-6, 10e-6)), "{both}");
    }
    assert_eq!(deviations("+30 / 0 um"), Ok((0.0, 30e-6)));
    assert_eq!(deviations("0 / -30 um"), Ok((-30e-6, 0.0)));
    assert_eq!(deviations("+72 / +53 um"), Ok((53e-6, 72e-6)));
    for refused in ["10 um", "+10 um", "±-10 um", "±", "+10 / -10", "30 / 10 um", "3/8 in"] {
        assert!(deviations(refused).is_err(), "{refused}");
    }
    let uncertain = |kind, text| parse_with_uncertainty(kind, text);
    assert_eq!(uncertain(Kind::Length, "60 mm ± 5 um"), Ok((0.06, 5e-6)));
    assert_eq!(uncertain(Kind::Length, "60.012 +/- 0.002 mm"), Ok((0.060012, 2e-6)));
    assert_eq!(uncertain(Kind::Temperature, "20 ± 2 degC"), Ok((293.15, 2.0)));
    assert_eq!(uncertain(Kind::Length, "60 mm"), Ok((0.06, 0.0)));
    assert!(uncertain(Kind::Length, "60 mm ± -5 um").is_err());
}

#[test]
fn each_spelling_stands_once_in_its_kind() {
    for kind in Kind::ALL {
        let mut spellings: Vec<&str> = kind.units().flat_map(|unit| unit.spellings()).collect();
        let count = spellings.len();
        spellings.sort_unstable();
        spellings.dedup();
        assert_eq!(spellings.len(), count, "{kind:?}");
    }
}

#[test]
fn every_spelling_of_the_table_is_read() {
    for unit in unit::UNITS {
        for spelling in unit.spellings() {
            let [name, alias] = [unit.name, spelling].map(|unit_text| format!("512 {unit_text}"));
            assert_eq!(parse(unit.kind, &alias), parse(unit.kind, &name), "{alias}");
            assert!(parse(unit.kind, &alias).is_ok(), "{alias}");
        }
    }
}

/// 30 kip/in² and 30 000 lbf/in² are one stress; a seven-digit pound-force would part them.
#[test]
fn thirty_thousand_psi_and_thirty_ksi_are_one_number() {
    assert_eq!(parse(Kind::Pressure, "30000 psi"), parse(Kind::Pressure, "30 kip/in²"));
}

#[test]
fn shown_numbers_carry_the_digits_they_deserve() {
    let shown = |measure, si, system| show(measure, si, system).to_string();
    assert_eq!(shown(Measure::Deviation, -0.00000001e-6, UnitSystem::Metric), "0 µm");
    assert_eq!(shown(Measure::Deviation, 52.5e-6, UnitSystem::Metric), "52.5 µm");
    assert_eq!(shown(Measure::Deviation, 25.4e-6, UnitSystem::Inch), "1 thou");
    assert_eq!(shown(Measure::Force, 61234.0, UnitSystem::Metric), "61.23 kN");
    assert_eq!(shown(Measure::Temperature, 487.15, UnitSystem::Metric), "214 °C");
    assert_eq!(shown(Measure::Temperature, 293.15, UnitSystem::Inch), "68 °F");
    assert_eq!(shown(Measure::Pressure, 6894757.293168361, UnitSystem::Inch), "1 ksi");
    assert_eq!(number(0.000012345678, 6), "1.23457e-5");
    assert_eq!(number(30457900.4, 6), "30457900");
}

/// 12.25 µm is a tie in tenths, whichever way it was worked out.
#[test]
fn ties_go_away_from_zero_whichever_way_the_number_came() {
    for metres in [12.25e-6, 0.06001225 - 0.06, 0.5 * (8.25e-6 + 16.25e-6), 12.25 / 1e6] {
        assert_eq!(show(Measure::Deviation, metres, UnitSystem::Metric).to_string(), "12.3 µm");
        assert_eq!(show(Measure::Deviation, -metres, UnitSystem::Metric).to_string(), "-12.3 µm");
    }
}

/// What does not exist must not look like nothing.
#[test]
fn a_number_that_is_not_finite_is_never_shown_as_zero() {
    for value in [f64::NAN, f64::INFINITY, f64::NEG_INFINITY] {
        assert_eq!(number(value, 4), "n/a");
        for measure in [Measure::Size, Measure::Temperature, Measure::Pressure] {
            assert_eq!(show(measure, value, UnitSystem::Metric).number, "n/a");
        }
        assert!(parse(Kind::Length, &written(Kind::Length, value)).is_err());
    }
}

#[test]
fn defaults_are_written_as_a_person_would() {
    let cases = [
        (Kind::Length, 25e-6, "25 um"),
        (Kind::Length, 0.0, "0 mm"),
        (Kind::Length, 0.0555625, "55.5625 mm"),
        (Kind::Force, 2000.0, "2000 N"),
        (Kind::Pressure, 355e6, "355 MPa"),
        (Kind::Pressure, 210e9, "210 GPa"),
        (Kind::Temperature, 77.15, "-196 degC"),
        (Kind::Angle, std::f64::consts::PI / 36.0, "5 deg"),
        (Kind::Expansion, 11.5e-6, "1.15e-5 /K"),
        (Kind::Number, -0.12, "-0.12"),
        (Kind::Time, 7200.0, "2 h"),
    ];
    for (kind, si, text) in cases {
        assert_eq!(written(kind, si), text);
    }
    let speed = parse(Kind::Speed, "1450 rpm").unwrap();
    assert_eq!(written(Kind::Speed, speed), "1450 rpm");
}

/// In YAML a bare number reaches the reader as it was typed.
#[test]
fn types_read_from_a_file_say_the_same() {
    let length = |text: &str| serde_yaml::from_str::<Length>(text).map_err(|error| error.to_string());
    assert_eq!(length("60 mm"), Ok(Length(0.06)));
    let refused = [("80", "80 has no unit: write 80 mm"), ("1e3", "write 1e3 mm"), (".nan", "not a finite")];
    for (text, words) in refused {
        let error = length(text).unwrap_err();
        assert!(error.contains(words) && error.contains(HELP_SEPARATOR), "{text}: {error:?}");
    }
    assert_eq!(serde_yaml::from_str::<Number>("0.12").unwrap(), Number(0.12));
    let range = serde_yaml::from_str::<NumberRange>("0.08 to 0.14").unwrap();
    assert_eq!(range, NumberRange { low: 0.08, high: 0.14 });
}

fn kinds() -> impl Strategy<Value = Kind> {
    prop::sample::select(Kind::ALL.to_vec())
}

fn read_every_way(kind: Kind, text: &str) {
    let told = |error: QuantityError| (error.to_string(), error.help());
    let _ = parse(kind, text).map_err(told);
    let _ = parse_range(kind, text).map_err(told);
    let _ = parse_plus_minus(kind, text).map_err(told);
    let _ = parse_with_uncertainty(kind, text).map_err(told);
}

proptest! {
    #[test]
    fn no_text_makes_it_panic(kind in kinds(), text in "\\PC{0,40}|(?s).{0,40}") {
        read_every_way(kind, &text);
    }

    #[test]
    fn near_numbers_do_not_make_it_panic(kind in kinds(), text in "[-+0-9./,eE_ x±µ−m°Ctoinf]{0,24}") {
        read_every_way(kind, &text);
    }

    #[test]
    fn what_is_read_is_finite(kind in kinds(), text in "-?[0-9]{1,3}(\\.[0-9]{0,3})?(e-?[0-9]{1,4})?( ?(mm|in|N|K|degF|rpm|h))?") {
        if let Ok(si) = parse(kind, &text) {
            prop_assert!(si.is_finite() && !(si == 0.0 && si.is_sign_negative()));
        }
    }

    /// Every number that is finite, also those that no text in the usual unit gives.
    #[test]
    fn what_is_written_reads_back_to_the_last_bit(kind in kinds(), si in any::<f64>()) {
        prop_assume!(si.is_finite());
        let si = if kind == Kind::Temperature { si.abs() } else { si };
        let text = written(kind, si);
        match parse(kind, &text) {
            Err(QuantityError::TooGreat { .. }) => prop_assert!(si.abs() > read::GREATEST, "{}", text),
            read => prop_assert_eq!(read, Ok(si), "{}", text),
        }
    }

    /// Numbers of everyday size, so that degC, rpm, deg and h are met as well.
    #[test]
    fn everyday_numbers_read_back_to_the_last_bit(kind in kinds(), thousandths in 0u32..50_000_000) {
        let si = f64::from(thousandths) / 1000.0;
        let text = written(kind, si);
        prop_assert_eq!(parse(kind, &text), Ok(si), "{}", text);
    }

    /// ISO 80000-1: a decimal comma and a decimal point mean the same; here only the point is read.
    #[test]
    fn a_comma_is_never_read(whole in 0u32..10_000, part in 0u32..10_000) {
        let text = format!("{whole},{part} mm");
        prop_assert!(parse(Kind::Length, &text).is_err());
    }
}
