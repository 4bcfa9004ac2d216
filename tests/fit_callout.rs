//! Fits as written, given and measured; no text and no number makes them panic.

use hubgrip::quantity::UnitSystem;
use hubgrip::tolerance::ansi_b4_1::AnsiClass;
use hubgrip::tolerance::iso286::{ToleranceClass, defined_classes, it_grade};
use hubgrip::tolerance::{FitCallout, Limits, Member, MemberCallout, Pair, ToleranceError};
use proptest::prelude::*;

fn deviations(lower: f64, upper: f64) -> MemberCallout {
    MemberCallout::Deviations(Limits { lower, upper })
}

#[test]
fn a_class_and_given_limits_go_together() {
    let hole = MemberCallout::parse("H7", Member::Hole).unwrap();
    let resolved = FitCallout::members(hole, deviations(53e-6, 72e-6)).resolve(0.060).unwrap();
    assert_eq!(resolved.limits, FitCallout::parse("H7/s6").unwrap().resolve(0.060).unwrap().limits);
    assert_eq!(resolved.hole_source, "ISO 286, H7, over 50 to 65 mm");
    assert_eq!(resolved.shaft_source, "deviations as given");
    let sizes = MemberCallout::Sizes { minimum: 60.053e-3, maximum: 60.072e-3 };
    let resolved = FitCallout::members(hole, sizes).resolve(0.060).unwrap();
    assert_eq!(resolved.limits.shaft, Limits { lower: 53e-6, upper: 72e-6 });
    assert_eq!(resolved.shaft_source, "limits of size as given");
}

#[test]
fn two_classes_are_an_iso_fit() {
    let hole = MemberCallout::parse("H7", Member::Hole).unwrap();
    let shaft = MemberCallout::parse("s6", Member::Shaft).unwrap();
    assert_eq!(FitCallout::members(hole, shaft), FitCallout::parse("H7/s6").unwrap());
    let error = MemberCallout::parse("s6", Member::Hole).unwrap_err();
    assert_eq!(error.to_string(), "`s6` is a class for a shaft, a hole is due here");
    assert!(error.help().unwrap().contains("did you mean `S6`?"));
    // A callout put together by hand is checked as well.
    let error = FitCallout::members(shaft, hole).resolve(0.060).unwrap_err();
    assert!(matches!(error, ToleranceError::WrongMember { .. }));
}

#[test]
fn measured_parts_are_as_far_apart_as_their_uncertainty_allows() {
    let resolved = FitCallout::measured(60.012e-3, 60.061e-3, 2e-6).resolve(0.060).unwrap();
    assert_eq!(resolved.limits.hole, Limits { lower: 10e-6, upper: 14e-6 });
    assert_eq!(resolved.limits.shaft, Limits { lower: 59e-6, upper: 63e-6 });
    let interference = resolved.limits.interference();
    assert_eq!((interference.loosest, interference.mean, interference.tightest), (45e-6, 49e-6, 53e-6));
    assert_eq!(resolved.hole_source, "measured 60.012 mm ± 2 µm");
    let certain = FitCallout::measured(60.012e-3, 60.061e-3, 0.0).resolve(0.060).unwrap();
    assert_eq!(certain.limits.interference().loosest, certain.limits.interference().tightest);
}

#[test]
fn the_pairs_have_the_names_of_the_standard() {
    // ISO 286-1: maximum-material limit, the larger shaft and the smaller hole.
    let limits = FitCallout::parse("H7/s6").unwrap().resolve(0.060).unwrap().limits;
    assert_eq!(limits.maximum_material(), Pair { hole: 0.0, shaft: 72e-6 });
    assert_eq!(limits.least_material(), Pair { hole: 30e-6, shaft: 53e-6 });
    let by_pair = limits.pairs().map(|pair| pair.interference());
    assert_eq!(by_pair, limits.interference());
}

#[test]
fn limits_that_cannot_be_meant_are_refused() {
    let h7 = MemberCallout::parse("H7", Member::Hole).unwrap();
    let fault = |shaft| FitCallout::members(h7, shaft).resolve(0.060).unwrap_err().to_string();
    assert_eq!(
        fault(deviations(72e-6, 53e-6)),
        "the shaft's lower deviation +72 µm is above its upper deviation +53 µm"
    );
    assert_eq!(
        fault(deviations(53e-3, 72e-3)),
        "the shaft's deviation +53000 µm is 88.3 % of the nominal diameter 60 mm, which looks like a slip of the \
         unit"
    );
    assert!(fault(deviations(0.0, 3.0e-3)).contains("5.0 % of the nominal diameter"));
    assert!(FitCallout::members(h7, deviations(0.0, 2.999e-3)).resolve(0.060).is_ok());
    assert_eq!(
        fault(MemberCallout::Sizes { minimum: 60.1e-3, maximum: 60.0e-3 }),
        "the shaft's minimum size 60.1 mm is above its maximum size 60 mm"
    );
    assert!(
        fault(MemberCallout::Sizes { minimum: 0.053e-3, maximum: 0.072e-3 }).contains("slip of the unit")
    );
    assert!(fault(MemberCallout::Sizes { minimum: -1.0, maximum: 1.0 }).contains("above zero"));
    assert!(fault(deviations(f64::NAN, 1e-6)).contains("finite"));
    let measured = |hole, shaft, uncertainty| {
        FitCallout::measured(hole, shaft, uncertainty).resolve(0.060).unwrap_err().to_string()
    };
    assert_eq!(measured(0.060, 0.060, -1e-6), "the uncertainty -1 µm is negative");
    assert!(measured(0.060, 0.066, 1e-6).contains("slip of the unit"));
    assert!(measured(0.060, 0.060, f64::INFINITY).contains("finite"));
    assert!(measured(0.060, 0.060, 4e-3).contains("slip of the unit"));
}

#[test]
fn callouts_are_written_in_the_usual_form() {
    let h7 = MemberCallout::parse("H7", Member::Hole).unwrap();
    for (callout, written) in [
        (FitCallout::members(h7, deviations(-20e-6, 0.0)), "hole H7, shaft -20 to 0 µm"),
        (
            FitCallout::members(h7, MemberCallout::Sizes { minimum: 60.053e-3, maximum: 60.072e-3 }),
            "hole H7, shaft 60.053 to 60.072 mm",
        ),
        (
            FitCallout::measured(60.012e-3, 60.061e-3, 2e-6),
            "measured hole 60.012 mm, shaft 60.061 mm, ± 2 µm",
        ),
    ] {
        assert_eq!(callout.to_string(), written);
    }
}

#[test]
fn mixed_units_are_allowed_and_said() {
    let remarks = |text, nominal, unit| {
        FitCallout::parse(text).unwrap().resolve_given_in(nominal, unit).unwrap().remarks
    };
    assert!(remarks("H7/s6", 0.060, UnitSystem::Metric).is_empty());
    assert!(remarks("FN 2", 2.0 * 0.0254, UnitSystem::Inch).is_empty());
    assert_eq!(
        remarks("H7/s6", 2.0 * 0.0254, UnitSystem::Inch),
        ["The metric tables of ISO 286 were entered at 50.8 mm (2 in)."]
    );
    assert_eq!(
        remarks("FN 2", 0.060, UnitSystem::Metric),
        ["The inch tables of ANSI B4.1 were entered at 2.362205 in (60 mm)."]
    );
    let given =
        FitCallout::deviations(Limits { lower: 0.0, upper: 30e-6 }, Limits { lower: 53e-6, upper: 72e-6 });
    assert!(given.resolve_given_in(2.0 * 0.0254, UnitSystem::Inch).unwrap().remarks.is_empty());
}

#[test]
fn remarks_of_both_members_are_passed_on() {
    let resolved = FitCallout::parse("JS7/js7").unwrap().resolve(0.025).unwrap();
    assert_eq!(resolved.remarks.len(), 2);
    let resolved = FitCallout::parse("FN 5").unwrap().resolve(4.0 * 0.0254).unwrap();
    assert!(resolved.remarks[0].contains("rest on memory"));
}

/// Texts that come near to a callout.
fn callout_like() -> impl Strategy<Value = String> {
    "[ 0-9]{0,3}[A-Za-z]{0,3}[ -]{0,1}[0-9]{0,3}[ /–|-]{0,2}[A-Za-z]{0,3}[0-9]{0,3}"
}

proptest! {
    #[test]
    fn no_text_makes_reading_panic(text in prop_oneof![any::<String>(), callout_like()], nominal in any::<f64>()) {
        if let Ok(fit) = FitCallout::parse(&text) {
            let _ = fit.resolve(nominal);
            prop_assert_eq!(FitCallout::parse(&fit.to_string()).unwrap(), fit);
        } else {
            let error = FitCallout::parse(&text).unwrap_err();
            prop_assert!(!error.to_string().is_empty() && error.help().is_some());
        }
        let _ = text.parse::<ToleranceClass>();
        let _ = text.parse::<AnsiClass>();
        for member in [Member::Hole, Member::Shaft] {
            let _ = MemberCallout::parse(&text, member);
        }
    }

    #[test]
    fn no_number_makes_resolving_panic(
        a in any::<f64>(), b in any::<f64>(), c in any::<f64>(), nominal in any::<f64>()
    ) {
        let _ = FitCallout::measured(a, b, c).resolve(nominal).map_err(|error| error.to_string());
        let sizes = MemberCallout::Sizes { minimum: a, maximum: b };
        let fit = FitCallout::members(deviations(a, b), sizes);
        let _ = (fit.resolve(nominal).map_err(|error| error.to_string()), fit.to_string());
    }

    #[test]
    fn every_class_defined_at_any_size_is_as_wide_as_its_grade(nominal in 1e-5..3.15_f64) {
        for member in [Member::Hole, Member::Shaft] {
            for class in defined_classes(member, nominal).unwrap() {
                let limits = class.limits(nominal).unwrap();
                prop_assert!(limits.upper >= limits.lower);
                prop_assert_eq!(limits.width(), it_grade(class.grade, nominal).unwrap());
            }
        }
    }

    #[test]
    fn given_limits_come_back_as_given(lower in -1e-4..1e-4_f64, width in 0.0..1e-4_f64) {
        let limits = Limits { lower, upper: lower + width };
        let resolved = FitCallout::deviations(limits, limits).resolve(0.060).unwrap();
        prop_assert_eq!(resolved.limits.hole, limits);
        prop_assert_eq!(resolved.limits.shaft, limits);
    }
}
