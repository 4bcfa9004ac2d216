//! Time from the oven or the bath until the clearance is gone.

use approx::{assert_abs_diff_eq, assert_relative_eq};
use hubgrip::assembly::AssemblyError;
use hubgrip::assembly::conduction::Substance;
use hubgrip::assembly::film::Film;
use hubgrip::assembly::handling::{HUB_EMISSIVITY, HandledPart, Handling, still_air_films};
use hubgrip::material::Expansion;
use proptest::prelude::*;

const SHOP: f64 = 293.15;

fn steel() -> Substance {
    Substance::constant(50.0, 7800.0, 500.0).unwrap()
}

fn part(inner: f64, outer: f64, temperature: f64) -> HandledPart {
    HandledPart {
        inner_diameter: inner,
        outer_diameter: outer,
        substance: steel(),
        expansion: Expansion::from_mean(12e-6, 77.0, 900.0, "test").unwrap(),
        temperature,
        bore: Film::Insulated,
        rim: Film::Insulated,
        ends: Film::Insulated,
    }
}

/// Hub of 100/200 mm at `hot` (K) over a solid shaft, interference 100 µm.
fn handling(hot: f64) -> Handling {
    Handling {
        hub: part(0.1, 0.2, hot),
        shaft: part(0.0, 0.1, SHOP),
        length: 0.1,
        interference: 100e-6,
        air_temperature: SHOP,
        gas_conductivity: 0.03,
        overlap_after: 0.0,
    }
}

#[test]
fn hub_in_air_alone_follows_the_series() {
    // Radii 50/100 mm, k 50, c 500, h 20 at the rim and 10 at the bore, 200 °C in air at 20 °C, clearance at least
    // 20 µm: 3452.354598 s by the series of the hollow cylinder (Carslaw and Jaeger ch. XIII).
    let mut pair = handling(473.15);
    pair.hub.bore = Film::Constant(10.0);
    pair.hub.rim = Film::Constant(20.0);
    let time = pair.time_in_air(20e-6).unwrap().unwrap();
    assert_relative_eq!(time, 3_452.354_598, max_relative = 1e-6);
}

#[test]
fn overlapped_parts_touch_within_a_minute_or_so() {
    // The same hub with h 10 at the rim over a cold solid shaft, gas in the gap 0.03 W/(m·K). An independent explicit
    // scheme (fourth-order Runge–Kutta, 25 to 200 rings) gives 72.97947, 72.92101, 72.90617, 72.90245 s and, with
    // the mesh width going to zero, 72.90121 s; the shaft is then at 364.942 K. A single mesh of about 130 rings
    // would print 72.905 s. In air alone, bore insulated: 11298.9434 s by the series.
    let mut pair = handling(473.15);
    pair.hub.rim = Film::Constant(10.0);
    let course = pair.course(0.0).unwrap();
    assert_relative_eq!(course.gone.unwrap(), 72.901_21, max_relative = 1e-5);
    assert_relative_eq!(course.gone_in_air.unwrap(), 11_298.943_4, max_relative = 1e-6);
    let last = course.points.last().unwrap();
    assert_abs_diff_eq!(last.shaft_temperature, 364.942, epsilon = 0.003);
    assert!(course.points.windows(2).all(|two| two[1].time > two[0].time));
    assert_abs_diff_eq!(course.clearance_at_overlap, 0.1 * 12e-6 * 180.0 - 100e-6, epsilon = 1e-15);
}

#[test]
fn a_shaft_from_liquid_nitrogen_warms_in_air_and_in_the_hub() {
    let mut pair = handling(SHOP);
    pair.shaft.temperature = 77.36;
    pair.interference = 150e-6;
    let [_, rim, ends] = still_air_films(0.1, 0.1, HUB_EMISSIVITY);
    (pair.shaft.rim, pair.shaft.ends) = (rim, ends);
    pair.overlap_after = 60.0;
    let course = pair.course(0.0).unwrap();
    let gone = course.gone.unwrap();
    assert!(60.0 < gone && gone < course.gone_in_air.unwrap());
    let start = course.points[0];
    assert_abs_diff_eq!(start.clearance, 0.10015 * 12e-6 * (SHOP - 77.36) - 150e-6, epsilon = 1e-12);
    assert!(course.clearance_at_overlap < start.clearance);
    // While apart, the hub stays at the temperature of the air.
    let apart = course.points.iter().rfind(|point| point.time <= 60.0).unwrap();
    assert_abs_diff_eq!(apart.hub_temperature, SHOP, epsilon = 1e-9);
    assert!(course.points.last().unwrap().hub_temperature < SHOP - 1.0);
    assert_abs_diff_eq!(course.points.last().unwrap().clearance, 0.0, epsilon = 1e-9);
}

#[test]
fn clearance_that_is_gone_before_the_parts_meet_is_told() {
    let mut pair = handling(473.15);
    pair.hub.rim = Film::Constant(30.0);
    let in_air = pair.time_in_air(20e-6).unwrap().unwrap();
    pair.overlap_after = in_air + 100.0;
    let course = pair.course(20e-6).unwrap();
    assert_relative_eq!(course.gone.unwrap(), in_air, max_relative = 1e-9);
    assert_relative_eq!(course.gone_in_air.unwrap(), in_air, max_relative = 1e-12);
}

#[test]
fn parts_that_clear_when_cold_have_all_the_time() {
    let mut pair = handling(473.15);
    pair.interference = -50e-6;
    pair.hub.rim = Film::Constant(20.0);
    let course = pair.course(0.0).unwrap();
    assert_eq!((course.gone, course.gone_in_air), (None, None));
    assert!(course.points.last().unwrap().clearance > 49e-6);
}

#[test]
fn end_faces_shorten_the_time_in_air() {
    let mut pair = handling(473.15);
    pair.hub.rim = Film::Constant(20.0);
    let covered = pair.time_in_air(0.0).unwrap().unwrap();
    pair.hub.ends = Film::Constant(20.0);
    let open = pair.time_in_air(0.0).unwrap().unwrap();
    // Lumped: rim 2 π b L h against rim and ends 2 π b L h + 2 π (b² − a²) h, with b 100, a 50, L 100 mm: 1 to 1.75.
    assert_relative_eq!(covered / open, 1.75, max_relative = 0.01);
}

#[test]
fn refuses_what_cannot_be() {
    let outside = Handling { hub: part(0.1, 0.2, 950.0), ..handling(473.15) };
    assert!(matches!(outside.course(0.0), Err(AssemblyError::OutsideCurve { part: "hub", .. })));
    let apart = Handling { shaft: part(0.0, 0.09, SHOP), ..handling(473.15) };
    assert!(matches!(apart.course(0.0), Err(AssemblyError::OutsideRange { .. })));
    assert!(Handling { gas_conductivity: 0.0, ..handling(473.15) }.course(0.0).is_err());
    assert!(Handling { overlap_after: -1.0, ..handling(473.15) }.course(0.0).is_err());
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(8))]
    #[test]
    fn a_hotter_oven_never_shortens_the_time(
        hot in 420.0..520.0_f64,
        more in 2.0..100.0_f64,
        after in 0.0..60.0_f64,
        interference in 20e-6..120e-6_f64,
    ) {
        let times = |hot| {
            let mut pair = handling(hot);
            let [bore, rim, ends] = still_air_films(0.2, 0.1, HUB_EMISSIVITY);
            (pair.hub.bore, pair.hub.rim, pair.hub.ends) = (bore, rim, ends);
            (pair.interference, pair.overlap_after) = (interference, after);
            let course = pair.course(0.0).unwrap();
            (course.gone.unwrap(), course.gone_in_air.unwrap())
        };
        let (cooler, hotter) = (times(hot), times(hot + more));
        prop_assert!(hotter.0 >= cooler.0 && hotter.1 >= cooler.1);
    }
}
