//! Bending, stepped hubs, finite length and the notch at the edge, value by value.

mod printed;

use std::f64::consts::{PI, TAU};

use approx::assert_relative_eq;
use hubgrip::mechanics::bending::BentJoint;
use hubgrip::mechanics::finite_length::{ShaftEnds, length_factors};
use hubgrip::mechanics::notch;
use hubgrip::mechanics::slices::{Slice, sliced_grip};
use hubgrip::mechanics::two_rings::TwoRings;
use printed::{MPA, assert_prints};

const JOINT: BentJoint = BentJoint { diameter: 0.05, length: 0.04, pressure: 75e6 };

#[test]
fn edge_pressure_and_limiting_moment() {
    // Equilibrium, computed independently with two methods: 50 by 40 mm, 400 N·m and 3 kN.
    assert_prints(JOINT.edge_pressure_rise(400.0, 3000.0).unwrap(), "20.0535228", MPA);
    assert_prints(JOINT.limiting_moment(3000.0).unwrap(), "1550.79633", 1.0);
    assert_prints(JOINT.recommended_moment(3000.0).unwrap(), "775.398163", 1.0);
    let limit = JOINT.limiting_moment(3000.0).unwrap();
    assert_relative_eq!(JOINT.edge_pressure_rise(limit, 3000.0).unwrap(), 75e6, max_relative = 1e-12);
    assert_eq!(JOINT.limiting_moment(1e6).unwrap(), 0.0);
    assert!(JOINT.limiting_moment(-1.0).is_err());
    assert!(BentJoint { length: 0.0, ..JOINT }.limiting_moment(0.0).is_err());
    assert!(BentJoint { pressure: f64::NAN, ..JOINT }.limiting_moment(0.0).is_err());
}

#[test]
fn the_assumed_distribution_carries_the_moment_and_the_force() {
    // The sums of p(x, φ) = (m 2x/L + f) cos φ over the seat, midpoint rule: moment ∫ p cos φ x dA, force ∫ p cos φ dA.
    let by_moment = JOINT.edge_pressure_rise(400.0, 0.0).unwrap();
    let by_force = JOINT.edge_pressure_rise(0.0, 3000.0).unwrap();
    let (rows, columns) = (2000, 64);
    let area = PI * JOINT.diameter * JOINT.length / f64::from(rows * columns);
    let (mut moment, mut force) = (0.0, 0.0);
    for row in 0..rows {
        let x = JOINT.length * ((f64::from(row) + 0.5) / f64::from(rows) - 0.5);
        for column in 0..columns {
            let cosine = (TAU * (f64::from(column) + 0.5) / f64::from(columns)).cos();
            let pressure = (by_moment * 2.0 * x / JOINT.length + by_force) * cosine;
            moment += pressure * cosine * x * area;
            force += pressure * cosine * area;
        }
    }
    assert_relative_eq!(moment, 400.0, max_relative = 1e-6);
    assert_relative_eq!(force, 3000.0, max_relative = 1e-9);
}

fn steel(hub_outer_diameter: f64, shaft_bore: f64) -> TwoRings {
    TwoRings {
        diameter: 0.05,
        hub_outer_diameter,
        shaft_bore,
        hub_youngs_modulus: 200e9,
        hub_poisson: 0.3,
        shaft_youngs_modulus: 200e9,
        shaft_poisson: 0.3,
    }
}

#[test]
fn stepped_hub_disc_by_disc() {
    // Lamé for each disc, computed independently with two methods: 20 mm of 75 mm outside on a solid shaft, 20 mm of
    // 100 mm outside on a bore of 20 mm, 50 µm, friction 0.12.
    let slices =
        [Slice { rings: steel(0.075, 0.0), length: 0.02 }, Slice { rings: steel(0.1, 0.02), length: 0.02 }];
    let grip = sliced_grip(&slices, 50e-6, 0.12, 0.12).unwrap();
    assert_prints(grip.pressures[0], "55.555556", MPA);
    assert_prints(grip.pressures[1], "65.625000", MPA);
    assert_prints(grip.torque, "1142.09983", 1.0);
    assert_prints(grip.axial_force, "45683.9932", 1.0);
    let halves = [slices[0], slices[1]].map(|slice| Slice { length: 0.01, ..slice });
    let split = [halves[0], halves[0], halves[1], halves[1]];
    assert_relative_eq!(
        sliced_grip(&split, 50e-6, 0.12, 0.12).unwrap().torque,
        grip.torque,
        max_relative = 1e-12
    );
    assert!(sliced_grip(&[], 50e-6, 0.12, 0.12).is_err());
    assert!(sliced_grip(&slices, 50e-6, -0.1, 0.12).is_err());
    let other = Slice { rings: TwoRings { diameter: 0.06, ..steel(0.1, 0.0) }, length: 0.02 };
    assert!(sliced_grip(&[slices[0], other], 50e-6, 0.12, 0.12).is_err());
    assert!(sliced_grip(&[Slice { length: 0.0, ..slices[0] }], 50e-6, 0.12, 0.12).is_err());
}

#[test]
fn factors_of_a_finite_length() {
    // Axisymmetric finite elements computed for this program, at the computed places.
    let factors = |slenderness, ratio| length_factors(slenderness, ratio, ShaftEnds::Through).unwrap();
    for (slenderness, ratio, mean, edge) in [
        (0.25, 0.3, "1.122", "1.61"),
        (0.25, 0.7, "1.065", "1.52"),
        (0.5, 0.5, "1.050", "1.66"),
        (1.0, 0.3, "1.029", "1.69"),
        (2.0, 0.5, "1.012", "1.62"),
        (2.0, 0.7, "1.007", "1.48"),
    ] {
        assert_prints(factors(slenderness, ratio).mean_pressure, mean, 1.0);
        assert_prints(factors(slenderness, ratio).edge_pressure, edge, 1.0);
    }
    // At the places the excess times L/d is 0.024 to 0.025; between them it must be nearly so too.
    for slenderness in [0.3, 0.4, 0.7, 1.5] {
        let excess = factors(slenderness, 0.5).mean_pressure - 1.0;
        assert!((0.0238..=0.0252).contains(&(excess * slenderness)), "{excess} at {slenderness}");
    }
    let flush = length_factors(0.5, 0.5, ShaftEnds::Flush).unwrap();
    assert_eq!((flush.mean_pressure, flush.edge_pressure), (1.0, 1.0));
    for (slenderness, ratio) in [(0.2, 0.5), (2.1, 0.5), (1.0, 0.29), (1.0, 0.71), (f64::NAN, 0.5)] {
        assert!(length_factors(slenderness, ratio, ShaftEnds::Through).is_err());
    }
}

#[test]
fn notch_factors_outside_their_table_are_refused() {
    assert!(notch::press_fit_bending(399e6).is_err());
    assert!(notch::press_fit_bending(1201e6).is_err());
    assert!(notch::key_seat_torsion(f64::NAN).is_err());
}
