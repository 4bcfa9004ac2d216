//! The elastic-plastic hub: closed-form check values, published examples, independent numerical solutions.

use approx::assert_relative_eq;
use hubgrip::mechanics::plastic::tresca::TrescaHub;
use hubgrip::mechanics::plastic::von_mises::VonMisesHub;
use hubgrip::mechanics::plastic::{
    CurveEnd, HubElasticity, HubLimitKind, HubYield, PlasticJoint, PlasticState, Regime, YieldRule, shaft,
};
use hubgrip::mechanics::two_rings::TwoRings;
use hubgrip::mechanics::{MechanicsError, criteria};

const STEEL: HubElasticity = HubElasticity { youngs_modulus: 200e9, poisson: 0.3 };
/// Half of the last digit of check values printed to nine digits.
const NINE_DIGITS: f64 = 5e-9;

/// One steel, solid shaft, d = 50 mm, d/D = 0.5.
const PLAIN: TwoRings = TwoRings {
    diameter: 0.05,
    hub_outer_diameter: 0.1,
    shaft_bore: 0.0,
    hub_youngs_modulus: 200e9,
    hub_poisson: 0.3,
    shaft_youngs_modulus: 200e9,
    shaft_poisson: 0.3,
};

fn joint(rings: TwoRings, rule: YieldRule) -> PlasticJoint {
    let input = HubYield { rings, rule, hub_yield_strength: 300e6, shaft_yield_strength: 400e6 };
    PlasticJoint::new(input).unwrap()
}

fn solved(rule: YieldRule) -> PlasticState {
    joint(PLAIN, rule).solve(2.5e-3 * PLAIN.diameter).unwrap()
}

fn modified(yield_strength: f64) -> f64 {
    2.0 * yield_strength / 3.0_f64.sqrt()
}

#[test]
fn tresca_onset_zone_and_limit_follow_the_closed_form() {
    let hub = TrescaHub::new(300e6, 0.5).unwrap();
    assert_relative_eq!(hub.onset_pressure(), 112.5e6, max_relative = 1e-12);
    assert_relative_eq!(hub.pressure(1.2).unwrap(), 150.696467e6, max_relative = NINE_DIGITS);
    let limit = hub.limit().unwrap();
    assert_relative_eq!(limit.pressure, 207.944154e6, max_relative = NINE_DIGITS);
    assert_eq!(limit.kind, HubLimitKind::FullyPlastic);
    assert_relative_eq!(limit.plastic_ratio, 2.0, max_relative = 1e-12);

    let hub = TrescaHub::new(modified(300e6), 0.5).unwrap();
    assert_relative_eq!(hub.onset_pressure(), 129.903811e6, max_relative = NINE_DIGITS);
    assert_relative_eq!(hub.pressure(1.2).unwrap(), 174.009292e6, max_relative = NINE_DIGITS);
    assert_relative_eq!(hub.limit().unwrap().pressure, 240.113227e6, max_relative = NINE_DIGITS);
}

#[test]
fn thick_tresca_hub_meets_the_pressure_cap_before_it_is_fully_plastic() {
    let limit = TrescaHub::new(300e6, 0.25).unwrap().limit().unwrap();
    assert_eq!(limit.kind, HubLimitKind::PressureCap);
    assert_relative_eq!(limit.pressure, 300e6, max_relative = 1e-12);
    assert_relative_eq!(limit.plastic_ratio, 1.83078058, max_relative = NINE_DIGITS);
}

#[test]
fn von_mises_onset_zone_limit_and_bore_follow_the_check_values() {
    let hub = VonMisesHub::new(300e6, 0.5).unwrap();
    assert_relative_eq!(hub.onset_pressure(), 128.571429e6, max_relative = NINE_DIGITS);
    assert_relative_eq!(hub.pressure(1.2).unwrap(), 171.221949e6, max_relative = NINE_DIGITS);
    assert_relative_eq!(hub.limit().unwrap().pressure, 230.927337e6, max_relative = NINE_DIGITS);
    assert_relative_eq!(hub.bore_strain(1.2, STEEL).unwrap(), 1.83429884e-3, max_relative = NINE_DIGITS);
    assert_relative_eq!(VonMisesHub::least_fully_plastic_ratio(), 0.33766654, max_relative = 2e-8);
    let limit = VonMisesHub::new(300e6, 0.3).unwrap().limit().unwrap();
    assert_eq!(limit.kind, HubLimitKind::PressureCap);
    assert_relative_eq!(limit.pressure, modified(300e6), max_relative = 1e-12);
}

// Check values: computed beforehand from the closed forms and, for von Mises, by integrating the flow rule.

#[test]
fn interference_of_a_plastic_zone() {
    let check = |rings: TwoRings, rule, expected: f64| {
        let found = joint(rings, rule).interference_at(1.2).unwrap() / rings.diameter;
        assert_relative_eq!(found, expected, max_relative = NINE_DIGITS);
    };
    check(PLAIN, YieldRule::Tresca, 2.16e-3);
    check(PLAIN, YieldRule::ModifiedTresca, 2.49415316e-3);
    let hollow_aluminium =
        TwoRings { shaft_bore: 0.02, shaft_youngs_modulus: 70e9, shaft_poisson: 0.33, ..PLAIN };
    check(hollow_aluminium, YieldRule::Tresca, 3.89505966e-3);
}

#[test]
fn one_material_on_a_solid_shaft_needs_only_the_zone() {
    // With one material and a solid shaft the pressure drops out: U/d = S0 zeta²/E, the form of DIN 7190-1.
    let tight = joint(PLAIN, YieldRule::ModifiedTresca);
    for zeta in [1.0, 1.1, 1.5, 1.9] {
        let expected = 2.0 * zeta * zeta * 300e6 / (3.0_f64.sqrt() * 200e9);
        let found = tight.interference_at(zeta).unwrap() / 0.05;
        assert_relative_eq!(found, expected, max_relative = 1e-12);
    }
}

#[test]
fn tresca_joint_at_an_interference() {
    let state = solved(YieldRule::Tresca);
    assert_eq!(state.regime, Regime::ElasticPlastic);
    assert_relative_eq!(state.pressure, 164.123844e6, max_relative = NINE_DIGITS);
    assert_relative_eq!(state.plastic_ratio, 1.29099445, max_relative = NINE_DIGITS);
    assert_relative_eq!(state.plastic_diameter, 1.29099445 * 0.05, max_relative = NINE_DIGITS);
    assert_relative_eq!(state.plastic_share, 0.222222222, max_relative = NINE_DIGITS);
    assert_relative_eq!(state.bore_growth / 0.05, 1.92556655e-3, max_relative = NINE_DIGITS);
    assert_relative_eq!(state.permanent.bore / 0.05, 3.11682086e-4, max_relative = NINE_DIGITS);
    assert!(!state.permanent.reverse_yield);
}

#[test]
fn modified_joint_at_an_interference() {
    let state = solved(YieldRule::ModifiedTresca);
    assert_relative_eq!(state.pressure, 174.268676e6, max_relative = NINE_DIGITS);
    assert_relative_eq!(state.plastic_ratio, 1.20140571, max_relative = NINE_DIGITS);
    assert_relative_eq!(state.permanent.bore / 0.05, 1.76417655e-4, max_relative = NINE_DIGITS);
}

#[test]
fn von_mises_joint_at_an_interference() {
    let state = solved(YieldRule::VonMises);
    assert_relative_eq!(state.pressure, 174.233965e6, max_relative = NINE_DIGITS);
    assert_relative_eq!(state.plastic_ratio, 1.21729073, max_relative = NINE_DIGITS);
    assert_relative_eq!(state.permanent.bore / 0.05, 1.76880473e-4, max_relative = NINE_DIGITS);
}

#[test]
fn tresca_stresses_loaded_and_left_over() {
    let state = solved(YieldRule::Tresca);
    let radial = [-164.123844, -109.427377, -48.611111, 0.0];
    let hoop = [135.876156, 190.572623, 173.611111, 125.0];
    let residual = [-137.663583, -16.101846, 21.644589, 15.584104];
    // Half of the last printed digit of a stress in MPa.
    let digit = 0.51e-6;
    for (index, ratio) in [1.0, 1.2, 1.5, 2.0].into_iter().enumerate() {
        let loaded = state.stress_at(ratio * 0.025).unwrap();
        assert!((loaded.radial / 1e6 - radial[index]).abs() < digit, "radial at {ratio}: {loaded:?}");
        assert!((loaded.hoop / 1e6 - hoop[index]).abs() < digit, "hoop at {ratio}: {loaded:?}");
        let left = state.residual_at(ratio * 0.025).unwrap().hoop;
        assert!((left / 1e6 - residual[index]).abs() < digit, "residual at {ratio}: {left}");
    }
}

#[test]
fn elastic_limit_of_the_shaft_and_the_quoted_one() {
    let hollow = shaft::quoted_shaft_limit(300e6, 0.4).unwrap();
    assert_relative_eq!(hollow.exact, 126e6, max_relative = 1e-12);
    assert_relative_eq!(hollow.quoted, 300e6 * (1.0 - 0.16) / 3.0_f64.sqrt(), max_relative = 1e-12);
    let solid = shaft::quoted_shaft_limit(300e6, 0.0).unwrap();
    assert_eq!(solid.exact, 300e6);
    assert_relative_eq!(solid.quoted, modified(300e6), max_relative = 1e-12);
    for limit in [hollow, solid] {
        assert!((limit.excess() - 0.1547).abs() < 0.00005);
    }
}

#[test]
fn shaft_limit_is_where_its_worst_point_reaches_the_criteria() {
    use hubgrip::mechanics::ring::{RingLoad, RingSection};
    for bore_ratio in [0.0, 0.05, 0.4, 0.9] {
        let pressure = shaft::elastic_limit(300e6, bore_ratio).unwrap();
        let ring = RingSection::new(0.025 * bore_ratio, 0.025, 200e9, 0.3, 0.0).unwrap();
        let load = RingLoad { outer_pressure: pressure, ..RingLoad::default() };
        let worst = |criterion: fn(f64, f64) -> f64| {
            (0..=100)
                .map(|step| ring.inner_radius() + (0.025 - ring.inner_radius()) * f64::from(step) / 100.0)
                .map(|r| ring.stress_at(&load, r).unwrap())
                .map(|stress| criterion(stress.radial, stress.hoop))
                .fold(0.0, f64::max)
        };
        assert_relative_eq!(worst(criteria::von_mises), 300e6, max_relative = 1e-12);
        assert_relative_eq!(worst(criteria::tresca), 300e6, max_relative = 1e-12);
    }
}
