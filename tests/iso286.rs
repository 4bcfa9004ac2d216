//! ISO 286 against printed class tables, against its own formulas, against worked examples, and by its rules.

use hubgrip::tolerance::iso286::{Grade, Letter, ToleranceClass, defined_classes, it_grade};
use hubgrip::tolerance::{Character, FitCallout, FitLimits, Limits, Member};

const MM: f64 = 1e-3;

/// Ends of the nominal size steps of ISO 286-1 with their sub-steps, mm.
const SUB_STEPS: [f64; 42] = [
    0.0, 3.0, 6.0, 10.0, 14.0, 18.0, 24.0, 30.0, 40.0, 50.0, 65.0, 80.0, 100.0, 120.0, 140.0, 160.0, 180.0,
    200.0, 225.0, 250.0, 280.0, 315.0, 355.0, 400.0, 450.0, 500.0, 560.0, 630.0, 710.0, 800.0, 900.0, 1000.0,
    1120.0, 1250.0, 1400.0, 1600.0, 1800.0, 2000.0, 2240.0, 2500.0, 2800.0, 3150.0,
];

fn class(text: &str) -> ToleranceClass {
    text.parse().unwrap()
}

fn limits(text: &str, nominal_mm: f64) -> Limits {
    class(text).limits(nominal_mm * MM).unwrap()
}

fn fit(text: &str, nominal_mm: f64) -> FitLimits {
    FitCallout::parse(text).unwrap().resolve(nominal_mm * MM).unwrap().limits
}

/// A micrometre value as the float nearest to it in metres.
fn micrometres(value: f64) -> f64 {
    value / 1e6
}

#[test]
fn printed_class_tables_agree_exactly() {
    // Each row names its printed source; values are whole or half micrometres, so equality is exact.
    let mut reader =
        csv::ReaderBuilder::new().comment(Some(b'#')).from_path("tests/data/iso286_checks.csv").unwrap();
    let mut compared = 0;
    let mut classes = std::collections::BTreeSet::new();
    for row in reader.deserialize() {
        let (nominal_mm, text, upper, lower, source): (f64, String, f64, f64, String) = row.unwrap();
        let found = limits(&text, nominal_mm);
        let expected = Limits { lower: micrometres(lower), upper: micrometres(upper) };
        assert_eq!(found, expected, "{text} at {nominal_mm} mm, {source}");
        classes.insert(text);
        compared += 1;
    }
    println!("{compared} printed limits of {} classes compared, all equal", classes.len());
    assert_eq!(compared, 385);
}

#[test]
fn worked_examples_of_textbooks_agree() {
    // Budynas and Nisbett, Shigley's Mechanical Engineering Design, 8th ed., solutions manual, problem 3-64:
    // 40 H7/s6, hole 40.000/40.025, shaft 40.043/40.059 mm.
    let example = fit("H7/s6", 40.0);
    assert_eq!(example.hole, Limits { lower: 0.0, upper: 25e-6 });
    assert_eq!(example.shaft, Limits { lower: 43e-6, upper: 59e-6 });
    assert_eq!(example.interference().loosest, 2.0 * 0.009 * MM);
    assert_eq!(example.interference().tightest, 2.0 * 0.0295 * MM);

    // Bhandari, Design of Machine Elements, example 3.2: 20 H7-s6, interference 0.014 to 0.048 mm.
    let example = fit("H7-s6", 20.0);
    assert_eq!(example.hole.upper, 21e-6);
    assert_eq!(example.shaft, Limits { lower: 35e-6, upper: 48e-6 });
    assert_eq!((example.interference().loosest, example.interference().tightest), (14e-6, 48e-6));

    // Polish school exercise on the fit 50 H8/s6, answers worked in full: clearances −0.004 and −0.059 mm.
    let example = fit("H8/s6", 50.0);
    assert_eq!(example.hole, Limits { lower: 0.0, upper: 39e-6 });
    assert_eq!(example.shaft, Limits { lower: 43e-6, upper: 59e-6 });
    assert_eq!((example.interference().loosest, example.interference().tightest), (4e-6, 59e-6));
}

#[test]
fn a_worked_example_in_inches_agrees_to_its_last_printed_digit() {
    // Budynas and Nisbett, 8th ed., solutions manual, problems 3-65 and 7-24: 1.5 in H7/s6 by the metric
    // tables, hole 1.5000/1.5010, shaft 1.5017/1.5023 in, printed to 0.0001 in; interference 0.0007 to
    // 0.0023 in from the rounded limits.
    let example = FitCallout::parse("H7/s6").unwrap().resolve(1.5 * 0.0254).unwrap().limits;
    let printed = |deviation: f64| (deviation / 0.0254 * 1e4).round();
    assert_eq!((printed(example.hole.lower), printed(example.hole.upper)), (0.0, 10.0));
    assert_eq!((printed(example.shaft.lower), printed(example.shaft.upper)), (17.0, 23.0));
    assert_eq!(printed(example.interference().loosest), 7.0);
    assert_eq!(printed(example.interference().tightest), 23.0);
}

#[test]
fn the_standard_s_own_examples_agree() {
    // ISO 286-1:1988, examples of determining limits, from memory: shaft 40 g11, −9 and −169 µm;
    // hole 130 N4, −27 + Δ with Δ = 4, so −23 and −35 µm.
    assert_eq!(limits("g11", 40.0), Limits { lower: -169e-6, upper: -9e-6 });
    assert_eq!(limits("N4", 130.0), Limits { lower: -35e-6, upper: -23e-6 });
}

#[test]
fn corrected_values_of_the_1988_edition_are_used() {
    // ISO 286-2:1988/Cor.1:2006.
    assert_eq!(limits("A13", 355.0).upper, 2090e-6);
    assert_eq!(limits("E8", 120.0).upper, 126e-6);
    assert_eq!(limits("R10", 30.0).upper, -28e-6);
    assert_eq!(limits("f9", 315.0).lower, -186e-6);
}

#[test]
fn the_exceptions_of_the_standard_are_kept() {
    // ISO 286-1, notes to the table of hole deviations: M6 over 250 to 315 mm has ES = −9 µm, not −11.
    assert_eq!(limits("M6", 250.0).upper, -8e-6);
    assert_eq!(limits("M6", 250.001).upper, -9e-6);
    assert_eq!(limits("M6", 315.0).upper, -9e-6);
    // N above IT8 over 3 mm has ES = 0; to 3 mm −4 µm.
    assert_eq!(limits("N9", 60.0).upper, 0.0);
    assert_eq!(limits("N9", 3.0).upper, -4e-6);
    // Sizes at the end of a step belong to it; Δ is added over 3 mm only.
    assert_eq!(limits("P7", 3.0), Limits { lower: -16e-6, upper: -6e-6 });
    assert_eq!(limits("P7", 3.001), Limits { lower: -20e-6, upper: -8e-6 });
    // No Δ over 500 mm: p is 78 µm, H7 is 70 µm wide.
    assert_eq!(limits("P7", 501.0), Limits { lower: -148e-6, upper: -78e-6 });
}

#[test]
fn every_defined_class_is_as_wide_as_its_grade() {
    let mut checked = 0;
    for step in SUB_STEPS.windows(2) {
        for nominal_mm in [0.5 * (step[0] + step[1]), step[1]] {
            for member in [Member::Hole, Member::Shaft] {
                for class in defined_classes(member, nominal_mm * MM).unwrap() {
                    let limits = class.limits(nominal_mm * MM).unwrap();
                    assert!(limits.upper >= limits.lower);
                    let width = it_grade(class.grade, nominal_mm * MM).unwrap();
                    assert_eq!(limits.width(), width, "{class} at {nominal_mm} mm");
                    checked += 1;
                }
            }
        }
    }
    assert!(checked > 60_000, "{checked}");
}

#[test]
fn deviations_are_ordered_from_a_to_zc() {
    // ISO 286-1, scheme of the deviations: from a to zc a shaft grows, from A to ZC a hole shrinks, but N
    // above IT8, which is set to zero over 3 to 500 mm.
    for step in SUB_STEPS.windows(2) {
        for member in [Member::Hole, Member::Shaft] {
            for number in [6, 8, 11] {
                let grade = Grade::numbered(number).unwrap();
                let classes = defined_classes(member, step[1] * MM).unwrap();
                let left_out = |letter| {
                    let set_to_zero = letter == Letter::N && member == Member::Hole && number > 8;
                    matches!(letter, Letter::J | Letter::Js) || set_to_zero
                };
                let middles: Vec<(String, f64)> = classes
                    .iter()
                    .filter(|class| class.grade == grade && !left_out(class.letter))
                    .map(|class| (class.to_string(), class.limits(step[1] * MM).unwrap().middle()))
                    .collect();
                for pair in middles.windows(2) {
                    let grows = pair[1].1 - pair[0].1;
                    let in_order = if member == Member::Shaft { grows >= 0.0 } else { grows <= 0.0 };
                    assert!(in_order, "{} and {} at {} mm", pair[0].0, pair[1].0, step[1]);
                }
            }
        }
    }
}

#[test]
fn holes_mirror_shafts() {
    // ISO 286-1: EI = −es for A to H; ES = −ei for K to ZC, plus Δ = ITn − IT(n−1) for K, M, N to IT8 and
    // P to ZC to IT7 over 3 to 500 mm. Exceptions: N above IT8 over 3 mm, M6 over 250 to 315 mm.
    let (mut checked, mut exceptions) = (0, 0);
    for step in SUB_STEPS.windows(2) {
        let nominal = step[1] * MM;
        for hole in defined_classes(Member::Hole, nominal).unwrap() {
            if matches!(hole.letter, Letter::J | Letter::Js) {
                continue;
            }
            let shaft = hole.mirrored();
            let found = hole.limits(nominal).unwrap();
            let (given, mirrored) = if hole.letter <= Letter::H {
                (found.lower, -shaft.limits(nominal).unwrap().upper)
            } else {
                (found.upper, -shaft_deviation(shaft.letter, shaft.grade, nominal) + delta(&hole, step))
            };
            let exception = (hole.to_string() == "M6" && step[0] >= 250.0 && step[1] <= 315.0)
                || (hole.letter == Letter::N && number(hole.grade) > 8 && step[0] >= 3.0 && step[1] <= 500.0);
            let equal = (given - mirrored).abs() < 1e-12;
            assert_eq!(equal, !exception, "{hole} at {} mm: {given} and {mirrored}", step[1]);
            checked += 1;
            exceptions += usize::from(exception);
        }
    }
    println!("{checked} holes mirror their shafts, {exceptions} of them are the standard's exceptions");
    assert_eq!(exceptions, 2 + 10 * 24);
}

/// Lower deviation of a shaft k to zc; k has its deviation for the grades 4 to 7 also where Δ is added to K.
fn shaft_deviation(letter: Letter, grade: Grade, nominal: f64) -> f64 {
    let grade = if letter == Letter::K && number(grade) <= 8 { Grade::numbered(6).unwrap() } else { grade };
    ToleranceClass { member: Member::Shaft, letter, grade }.limits(nominal).unwrap().lower
}

fn delta(hole: &ToleranceClass, step: &[f64]) -> f64 {
    let last = if hole.letter <= Letter::N { 8 } else { 7 };
    let n = number(hole.grade);
    if step[0] < 3.0 || step[1] > 500.0 || !(3..=last).contains(&n) {
        return 0.0;
    }
    let width = |number| it_grade(Grade::numbered(number).unwrap(), step[1] * MM).unwrap();
    width(n) - width(n - 1)
}

/// Number of a grade; 0 for IT0 and IT01.
fn number(grade: Grade) -> u8 {
    grade.name().parse().unwrap()
}

#[test]
fn shaft_basis_fits_equal_hole_basis_fits() {
    // ISO 286-1: Δ is there so that H(n)/p(n−1) and P(n)/h(n−1) have the same interference. J follows the
    // same rule without a Δ of its own. K from grade 5, where k has its deviation; not M6 over 250 to 315 mm.
    let mut checked = 0;
    for nominal_mm in SUB_STEPS.iter().copied().filter(|size| (6.0..=500.0).contains(size)) {
        for letter in Letter::ALL.into_iter().filter(|letter| *letter >= Letter::J && *letter != Letter::Js) {
            let grades = match letter {
                Letter::J => 6..=8,
                Letter::K => 5..=8,
                Letter::M | Letter::N => 3..=8,
                _ => 3..=7,
            };
            for n in grades {
                let finer = |letter: &str| format!("{letter}{}", n - 1);
                let name = letter.name();
                let hole = format!("{}{n}", name.to_uppercase());
                let exception = hole == "M6" && nominal_mm > 250.0 && nominal_mm <= 315.0;
                if exception || class(&hole).limits(nominal_mm * MM).is_err() {
                    continue;
                }
                let hole_basis = format!("H{n}/{}", finer(name));
                let shaft_basis = format!("{hole}/{}", finer("h"));
                assert_eq!(
                    fit(&hole_basis, nominal_mm).interference(),
                    fit(&shaft_basis, nominal_mm).interference(),
                    "{hole_basis} and {shaft_basis} at {nominal_mm} mm"
                );
                checked += 1;
            }
        }
    }
    println!("{checked} pairs of hole-basis and shaft-basis fits have equal interference");
    assert!(checked > 1500, "{checked}");
}

#[test]
fn common_fits_have_the_character_they_are_chosen_for() {
    // ANSI B4.2-1978, description of preferred fits (from memory): H7/g6 sliding, H7/k6 locational
    // transition, H7/p6 locational interference (transition to 3 mm), H7/s6 medium drive, H7/u6 force.
    for nominal_mm in SUB_STEPS.iter().copied().filter(|size| (3.0..=500.0).contains(size)) {
        let character = |text| fit(text, nominal_mm).character();
        assert_eq!(character("H7/g6"), Character::Clearance);
        assert_eq!(character("H7/h6"), Character::Clearance);
        assert_eq!(character("H7/k6"), Character::Transition);
        let press = if nominal_mm > 3.0 { Character::Interference } else { Character::Transition };
        assert_eq!(character("H7/p6"), press, "{nominal_mm} mm");
        assert_eq!(character("H7/s6"), Character::Interference);
        assert_eq!(character("H7/u6"), Character::Interference);
        assert_eq!(character("S7/h6"), Character::Interference);
    }
}

#[test]
fn known_limits_of_the_workshop_agree() {
    // What every fitter knows of H7 and h6 at 25 mm: common practice, no source.
    assert_eq!(limits("H7", 25.0), Limits { lower: 0.0, upper: 21e-6 });
    assert_eq!(limits("h6", 25.0), Limits { lower: -13e-6, upper: 0.0 });
    assert_eq!(limits("js5", 25.0), Limits { lower: -4.5e-6, upper: 4.5e-6 });
    assert_eq!(limits("js01", 2.0), Limits { lower: -0.15e-6, upper: 0.15e-6 });
}
