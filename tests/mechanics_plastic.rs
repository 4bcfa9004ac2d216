//! The elastic-plastic hub: closed-form check values, published examples, independent numerical solutions.

use approx::assert_relative_eq;
use hubgrip::mechanics::plastic::tresca::TrescaHub;
use hubgrip::mechanics::plastic::von_mises::VonMisesHub;
use hubgrip::mechanics::plastic::{HubElasticity, HubLimitKind};

const STEEL: HubElasticity = HubElasticity { youngs_modulus: 200e9, poisson: 0.3 };
/// Half of the last digit of check values printed to nine digits.
const NINE_DIGITS: f64 = 5e-9;

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
    assert_relative_eq!(
        hub.bore_strain(1.2, STEEL).unwrap() + 0.7 / 200e9 * 150.696467e6,
        2.16e-3,
        max_relative = 1e-8
    );

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
