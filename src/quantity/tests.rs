use proptest::prelude::*;

use super::*;

/// Spellings with what they mean in SI; also the documentation of what is accepted.
const ACCEPTED: &[(Kind, &str, f64)] = &[
    (Kind::Length, "60 mm", 0.06),
    (Kind::Length, "60mm", 0.06),
    (Kind::Length, "  60.0   mm ", 0.06),
    (Kind::Length, "+6e1 mm", 0.06),
    (Kind::Length, "1.5e-3 mm", 1.5e-6),
    (Kind::Length, "-25 um", -25e-6),
    (Kind::Length, "25 µm", 25e-6),
    (Kind::Length, "25 \u{3bc}m", 25e-6),
    (Kind::Length, "1.5 in", 0.0381),
    (Kind::Length, "2-3/16 in", 0.0555625),
    (Kind::Length, "2 3/16 in", 0.0555625),
    (Kind::Length, "3/8 in", 0.009525),
    (Kind::Length, "1 thou", 25.4e-6),
    (Kind::Length, ".5 in", 0.0127),
    (Kind::Force, "2 kN", 2000.0),
    (Kind::Force, "1 lbf", 4.4482216152605),
    (Kind::Torque, "900 N.m", 900.0),
    (Kind::Torque, "900 N·m", 900.0),
    (Kind::Torque, "900 N m", 900.0),
    (Kind::Torque, "900 Nm", 900.0),
    (Kind::Torque, "1 lbf.ft", 1.3558179483314004),
    (Kind::Torque, "12 lbf.in", 1.3558179483314004),
    (Kind::Pressure, "210 GPa", 210e9),
    (Kind::Pressure, "355 N/mm²", 355e6),
    (Kind::Pressure, "30 ksi", 206842718.79505083),
    (Kind::Temperature, "20 degC", 293.15),
    (Kind::Temperature, "20 °C", 293.15),
    (Kind::Temperature, "32 degF", 273.15),
    (Kind::Temperature, "-196 degC", 77.15),
    (Kind::TemperatureDifference, "100 degF", 55.55555555555556),
    (Kind::TemperatureDifference, "40 K", 40.0),
    (Kind::Speed, "60 rpm", std::f64::consts::TAU),
    (Kind::Expansion, "11.5e-6 /K", 11.5e-6),
    (Kind::Expansion, "11.5 um/m.K", 11.5e-6),
    (Kind::Density, "7850 kg/m3", 7850.0),
    (Kind::Conductivity, "45 W/m.K", 45.0),
    (Kind::SpecificHeat, "480 J/kg.K", 480.0),
    (Kind::Number, "0.12", 0.12),
];

/// A unit's size and the number are each a double: two roundings at most.
const LAST_BITS: f64 = 4.0 * f64::EPSILON;

#[test]
fn every_accepted_spelling_means_what_the_table_says() {
    for &(kind, text, si) in ACCEPTED {
        let found = parse(kind, text).unwrap_or_else(|error| panic!("{text}: {error}"));
        assert!((found - si).abs() <= LAST_BITS * si.abs(), "{text}: {found} is not {si}");
    }
}

/// Texts that are refused, with a piece of the message or of the help.
const REFUSED: &[(Kind, &str, &str)] = &[
    (Kind::Length, "", "a length is due"),
    (Kind::Length, "80", "write 80 mm"),
    (Kind::Length, "1e3", "write 1e3 mm"),
    (Kind::Length, "60 MPa", "a pressure; a length is due"),
    (Kind::Length, "60 Mm", "not a unit"),
    (Kind::Length, "60 MM", "not a unit"),
    (Kind::Length, "1,5 mm", "write 1.5 mm"),
    (Kind::Length, "1_000 mm", "no grouping"),
    (Kind::Length, "1 000 mm", "no grouping"),
    (Kind::Length, "0x10 mm", "no grouping"),
    (Kind::Length, "NaN mm", "not a finite number"),
    (Kind::Length, "-inf mm", "not a finite number"),
    (Kind::Length, "1e999 mm", "not a finite number"),
    (Kind::Length, "mm", "does not begin with a number"),
    (Kind::Length, "3/0 in", "not a unit"),
    (Kind::Torque, "900 N.mn", "did you mean"),
    (Kind::Temperature, "-300 degC", "absolute zero"),
    (Kind::TemperatureDifference, "3 mm", "a temperature difference is due"),
    (Kind::Number, "0.12 mm", "plain number"),
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
fn thirty_thousand_psi_and_thirty_ksi_are_one_number() {
    let (psi, ksi) = (parse(Kind::Pressure, "30000 psi").unwrap(), parse(Kind::Pressure, "30 ksi").unwrap());
    assert!((psi - ksi).abs() <= LAST_BITS * psi, "{psi} {ksi}");
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

fn kinds() -> impl Strategy<Value = Kind> {
    prop::sample::select(Kind::ALL.to_vec())
}

proptest! {
    #[test]
    fn no_text_makes_it_panic(kind in kinds(), text in ".{0,40}") {
        let _ = parse(kind, &text).map_err(|error| (error.to_string(), error.help()));
        let _ = parse_range(kind, &text);
        let _ = parse_plus_minus(kind, &text);
        let _ = parse_with_uncertainty(kind, &text);
    }

    #[test]
    fn near_numbers_do_not_make_it_panic(kind in kinds(), text in "[-+0-9./,eE_ x±µm°Ctoinf]{0,24}") {
        let _ = parse(kind, &text).map_err(|error| (error.to_string(), error.help()));
        let _ = parse_range(kind, &text);
        let _ = parse_plus_minus(kind, &text);
        let _ = parse_with_uncertainty(kind, &text);
    }

    #[test]
    fn what_is_written_reads_back(kind in kinds(), mantissa in -9_999_999i64..9_999_999, power in -9i32..6) {
        let si = mantissa as f64 * 10f64.powi(power);
        prop_assume!(kind != Kind::Temperature || si >= 0.0);
        let text = written(kind, si);
        let back = parse(kind, &text).map_err(|error| TestCaseError::fail(format!("{text}: {error}")))?;
        // A temperature goes through a shift of 273.15: its last bits are those of that size.
        let scale = if kind == Kind::Temperature { si.abs() + 273.15 } else { si.abs() };
        prop_assert!((back - si).abs() <= 2.0 * LAST_BITS * scale, "{text}: {back} is not {si}");
    }

    #[test]
    fn a_text_in_the_usual_unit_reads_back_exactly(hundredths in -1_000_000i64..1_000_000) {
        let text = format!("{} mm", hundredths as f64 / 100.0);
        let si = parse(Kind::Length, &text).expect("it is a length");
        prop_assert_eq!(parse(Kind::Length, &written(Kind::Length, si)), Ok(si));
    }
}
