//! Check values of the closed forms: one ring, two rings, a stack, strength, capacity.
//!
//! Unless a test says otherwise the numbers come from the closed form, computed independently with two methods
//! and written to the digits shown; the equation's textbook stands at each test. All steel: 200 GPa, ν = 0.3,
//! 7800 kg/m³, 12e-6 /K.

mod printed;

use approx::assert_relative_eq;
use hubgrip::mechanics::criteria::{greatest_principal, tresca, von_mises};
use hubgrip::mechanics::ring::{RingLoad, RingSection};
use hubgrip::mechanics::stack::Stack;
use hubgrip::mechanics::two_rings::TwoRings;
use hubgrip::mechanics::{MechanicsError, capacity, rotation, temperature};
use printed::{MPA, assert_prints};

const MICRON: f64 = 1e-6;

fn steel_ring(inner_mm: f64, outer_mm: f64) -> RingSection {
    RingSection::new(inner_mm * 1e-3, outer_mm * 1e-3, 200e9, 0.3, 7800.0).unwrap()
}

fn steel_stack(radii_mm: &[f64], interference_um: &[f64]) -> Stack {
    Stack {
        rings: radii_mm.windows(2).map(|faces| steel_ring(faces[0], faces[1])).collect(),
        interference: interference_um.iter().map(|value| value * MICRON).collect(),
        free_strain: vec![0.0; radii_mm.len() - 1],
        ..Stack::default()
    }
}

fn steel_joint() -> TwoRings {
    TwoRings {
        diameter: 0.05,
        hub_outer_diameter: 0.1,
        shaft_bore: 0.0,
        hub_youngs_modulus: 200e9,
        hub_poisson: 0.3,
        shaft_youngs_modulus: 200e9,
        shaft_poisson: 0.3,
    }
}

#[test]
fn pressure_of_two_rings() {
    // Timoshenko & Goodier, Theory of Elasticity, § 28.
    assert_prints(steel_joint().pressure(50.0 * MICRON).unwrap(), "75.000000", MPA);
    let aluminium_hub =
        TwoRings { shaft_bore: 0.02, hub_youngs_modulus: 70e9, hub_poisson: 0.33, ..steel_joint() };
    assert_prints(aluminium_hub.pressure(50.0 * MICRON).unwrap(), "29.473684", MPA);
    assert_eq!(steel_joint().pressure(-10.0 * MICRON).unwrap(), 0.0);
}

#[test]
fn one_ring_under_pressure() {
    // Lamé; Timoshenko & Goodier, § 28.
    let ring = steel_ring(25.0, 50.0);
    let load = RingLoad { inner_pressure: 50e6, ..RingLoad::default() };
    assert_prints(ring.stress_at(&load, 0.025).unwrap().hoop, "83.333333", MPA);
    assert_prints(ring.stress_at(&load, 0.050).unwrap().hoop, "33.333333", MPA);
    assert_prints(ring.stress_at(&load, 0.025).unwrap().radial, "-50.000000", MPA);
    assert!(ring.stress_at(&load, 0.050).unwrap().radial.abs() < 1e-6);
    assert_prints(ring.displacement_at(&load, 0.025).unwrap(), "12.2916667", MICRON);
    assert_prints(ring.displacement_at(&load, 0.050).unwrap(), "8.33333333", MICRON);
}

#[test]
fn one_ring_turning() {
    // Timoshenko & Goodier, § 32.
    let ring = steel_ring(25.0, 50.0);
    let load = RingLoad { angular_speed: 1000.0, ..RingLoad::default() };
    assert_prints(ring.stress_at(&load, 0.025).unwrap().hoop, "16.940625", MPA);
    assert_prints(ring.stress_at(&load, 0.050).unwrap().hoop, "7.434375", MPA);
    assert_prints(ring.displacement_at(&load, 0.025).unwrap(), "2.117578125", MICRON);
    assert_prints(ring.displacement_at(&load, 0.050).unwrap(), "1.85859375", MICRON);
}

#[test]
fn one_solid_ring_turning() {
    // Timoshenko & Goodier, § 32; a solid ring is not the limit of a vanishing bore, which doubles the stress.
    let solid = steel_ring(0.0, 25.0);
    let load = RingLoad { angular_speed: 1000.0, ..RingLoad::default() };
    let centre = solid.stress_at(&load, 0.0).unwrap();
    assert_prints(centre.radial, "2.0109375", MPA);
    assert_prints(centre.hoop, "2.0109375", MPA);
    assert_prints(solid.stress_at(&load, 0.025).unwrap().hoop, "0.853125", MPA);
    assert_prints(solid.displacement_at(&load, 0.025).unwrap(), "0.106640625", MICRON);
    let pinhole = steel_ring(25e-6, 25.0);
    let at_hole = pinhole.stress_at(&load, pinhole.inner_radius()).unwrap();
    assert_relative_eq!(at_hole.hoop, 2.0 * centre.hoop, max_relative = 1e-9);
}

#[test]
fn strength_criteria_at_a_hub_bore() {
    // Timoshenko & Goodier, § 28: σφ = p (1 + Q²)/(1 − Q²), σv = p √(3 + Q⁴)/(1 − Q²), σt = 2p/(1 − Q²), Q = 0.5.
    let hub = steel_ring(25.0, 50.0);
    let load = RingLoad { inner_pressure: 75e6, ..RingLoad::default() };
    let bore = hub.stress_at(&load, 0.025).unwrap();
    assert_prints(bore.hoop, "125.000000", MPA);
    assert_prints(von_mises(bore.radial, bore.hoop), "175.000000", MPA);
    assert_prints(tresca(bore.radial, bore.hoop), "200.000000", MPA);
    assert_prints(greatest_principal(bore.radial, bore.hoop), "125.000000", MPA);
}

#[test]
fn strength_criteria_of_a_shaft() {
    // Timoshenko & Goodier, § 28: hollow bore σφ = −2p/(1 − q²), σr = 0; solid σr = σφ = −p everywhere.
    let pressed = |pressure: f64| RingLoad { outer_pressure: pressure, ..RingLoad::default() };
    let hollow = steel_ring(10.0, 25.0);
    let bore = hollow.stress_at(&pressed(126e6), 0.010).unwrap();
    assert!(bore.radial.abs() < 1e-6);
    // Yield of the hollow shaft, q = 0.4, at 300 MPa: p = 126 MPa by Tresca and von Mises alike.
    assert_prints(-bore.hoop, "300.000000", MPA);
    assert_prints(tresca(bore.radial, bore.hoop), "300.000000", MPA);
    assert_prints(von_mises(bore.radial, bore.hoop), "300.000000", MPA);
    let solid = steel_ring(0.0, 25.0);
    for radius in [0.0, 0.010, 0.025] {
        let stress = solid.stress_at(&pressed(300e6), radius).unwrap();
        assert_prints(stress.radial, "-300.000000", MPA);
        assert_prints(stress.hoop, "-300.000000", MPA);
        // Leaving out the axial principal stress zero would give no shear at all here.
        assert_prints(tresca(stress.radial, stress.hoop), "300.000000", MPA);
        assert_prints(von_mises(stress.radial, stress.hoop), "300.000000", MPA);
        assert_eq!(greatest_principal(stress.radial, stress.hoop), 0.0);
    }
}

#[test]
fn greatest_pressure_in_a_brittle_hub() {
    // Rankine (greatest principal stress): p (1 + Q²)/(1 − Q²) ≤ Rm/S; Rm = 250 MPa, S = 2.5, Q = 0.5.
    let hub = steel_ring(25.0, 50.0);
    let load = RingLoad { inner_pressure: 60e6, ..RingLoad::default() };
    let bore = hub.stress_at(&load, 0.025).unwrap();
    assert_prints(greatest_principal(bore.radial, bore.hoop), "100.000000", MPA);
    assert_prints(250e6 / 2.5 / steel_joint().hub_hoop_factor(), "60.000000", MPA);
}

#[test]
fn pressures_of_three_rings() {
    // Lamé for each ring; Timoshenko & Goodier, § 28.
    let radii = [10.0, 20.0, 30.0, 50.0];
    let stack = steel_stack(&radii, &[20.0, 30.0]);
    let solution = stack.solve().unwrap();
    assert_prints(solution.pressures[0], "57.812500", MPA);
    assert_prints(solution.pressures[1], "40.740741", MPA);
    let filled = Stack { inner_pressure: 100e6, ..stack }.solve().unwrap();
    assert_prints(filled.pressures[0], "79.687500", MPA);
    assert_prints(filled.pressures[1], "48.148148", MPA);
}

#[test]
fn influence_of_pressure_on_the_gaps() {
    // Lamé; Timoshenko & Goodier, § 28. r M is symmetric by Betti's theorem: 20 · 3.6 = 30 · 2.4.
    let influence = steel_stack(&[10.0, 20.0, 30.0, 50.0], &[20.0, 30.0]).influence().unwrap();
    assert_prints(influence.diagonal[0], "4.2666667", 1e-13);
    assert_prints(influence.upper[0], "-3.6", 1e-13);
    assert_prints(influence.lower[1], "-2.4", 1e-13);
    assert_prints(influence.diagonal[1], "7.0875", 1e-13);
    assert_relative_eq!(0.020 * influence.upper[0], 0.030 * influence.lower[1], max_relative = 1e-12);
    assert_eq!((influence.lower[0], influence.upper[1]), (0.0, 0.0));
}

#[test]
fn a_clearance_that_its_neighbour_closes_and_one_that_stays_open() {
    // Lamé for each ring with p ≥ 0, gap ≥ 0, p · gap = 0 at each interface.
    let radii = [10.0, 20.0, 30.0, 50.0];
    let closed = steel_stack(&radii, &[20.0, -10.0]).solve().unwrap();
    assert_prints(closed.pressures[0], "24.479167", MPA);
    assert_prints(closed.pressures[1], "1.234568", MPA);
    let open = steel_stack(&radii, &[20.0, -20.0]).solve().unwrap();
    assert_prints(open.pressures[0], "23.4375", MPA);
    assert_eq!(open.pressures[1], 0.0);
    assert_eq!(open.open, [false, true]);
    assert_prints(open.gaps[1], "4.375", MICRON);
}

#[test]
fn pressure_falls_with_the_square_of_the_speed() {
    // Timoshenko & Goodier, § 32: p = p(0) − κ ω², κ = 6.0328125 Pa s².
    let turning = Stack { angular_speed: 1000.0, ..steel_stack(&[0.0, 25.0, 50.0], &[50.0]) };
    assert_prints(turning.solve().unwrap().pressures[0], "68.9671875", MPA);
    assert_relative_eq!(turning.solve().unwrap().pressures[0], 75e6 - 6.0328125e6, max_relative = 1e-13);
}

#[test]
fn pressure_of_a_warm_aluminium_hub() {
    // Lamé with the free strain α ΔT; hub 70 GPa, 0.33, 23e-6 /K.
    let joint = |hub_rise: f64, shaft_rise: f64| {
        let mut stack = steel_stack(&[0.0, 25.0, 50.0], &[50.0]);
        stack.rings[1] = RingSection::new(0.025, 0.05, 70e9, 0.33, 2700.0).unwrap();
        stack.free_strain = vec![12e-6 * shaft_rise, 23e-6 * hub_rise];
        stack.solve().unwrap().pressures[0]
    };
    assert_prints(joint(0.0, 0.0), "31.226766", MPA);
    assert_prints(joint(40.0, 40.0), "17.486989", MPA);
    assert_prints(joint(20.0, 0.0), "16.862454", MPA);
}

#[test]
fn capacity_and_combined_load() {
    // Equilibrium; Kollmann, Welle-Nabe-Verbindungen (1984): 75 MPa, 50 mm by 40 mm, friction 0.12.
    let (torque, axial) = (capacity::torque(0.12, 75e6, 0.05, 0.04), capacity::axial(0.12, 75e6, 0.05, 0.04));
    assert_prints(torque, "1413.71669", 1.0);
    assert_prints(axial, "56548.6678", 1.0);
    assert_prints(capacity::slip_safety(500.0, 5000.0, torque, axial), "2.74301330", 1.0);
    let weaker = capacity::axial(0.1, 75e6, 0.05, 0.04);
    assert_prints(capacity::slip_safety(500.0, 5000.0, torque, weaker), "2.70819002", 1.0);
    // Isotropic friction: the resultant √(F² + (2T/d)²) against µ p π d L.
    let resultant = 5000.0_f64.hypot(2.0 * 500.0 / 0.05);
    assert_relative_eq!(
        capacity::slip_safety(500.0, 5000.0, torque, axial),
        axial / resultant,
        max_relative = 1e-12
    );
    assert_eq!(capacity::slip_safety(0.0, 0.0, torque, axial), f64::INFINITY);
    assert_eq!(capacity::slip_safety(1.0, 0.0, 0.0, 0.0), 0.0);
}

#[test]
fn what_no_formula_allows_is_an_error() {
    let outside = |result: Result<RingSection, MechanicsError>| {
        matches!(result, Err(MechanicsError::OutsideRange { .. }))
    };
    assert!(outside(RingSection::new(0.05, 0.05, 200e9, 0.3, 7800.0)));
    assert!(outside(RingSection::new(-0.01, 0.05, 200e9, 0.3, 7800.0)));
    assert!(outside(RingSection::new(0.01, 0.05, 0.0, 0.3, 7800.0)));
    assert!(outside(RingSection::new(0.01, 0.05, 200e9, 0.5, 7800.0)));
    assert!(outside(RingSection::new(0.01, 0.05, 200e9, 0.3, -1.0)));
    assert!(outside(RingSection::new(0.01, f64::INFINITY, 200e9, 0.3, 1.0)));
    assert!(outside(RingSection::new(0.01, f64::NAN, 200e9, 0.3, 1.0)));
    assert!(TwoRings { shaft_bore: 0.05, ..steel_joint() }.pressure(1e-5).is_err());
    assert!(TwoRings { hub_outer_diameter: 0.05, ..steel_joint() }.pressure(1e-5).is_err());
    assert!(TwoRings { hub_youngs_modulus: 0.0, ..steel_joint() }.pressure(1e-5).is_err());
    assert!(TwoRings { hub_poisson: 0.6, ..steel_joint() }.pressure(1e-5).is_err());
    assert!(steel_joint().pressure(f64::NAN).is_err());

    let good = steel_stack(&[0.0, 25.0, 50.0], &[50.0]);
    assert!(matches!(
        Stack { inner_pressure: 1e6, ..good.clone() }.solve(),
        Err(MechanicsError::OutsideRange { .. })
    ));
    let mut apart = good.clone();
    apart.rings[1] = steel_ring(26.0, 50.0);
    assert!(matches!(apart.solve(), Err(MechanicsError::RingsDoNotMeet { inner: 0, .. })));
    assert!(matches!(
        Stack { interference: vec![], ..good.clone() }.solve(),
        Err(MechanicsError::WrongCount { .. })
    ));
    assert!(matches!(
        Stack { free_strain: vec![0.0], ..good.clone() }.solve(),
        Err(MechanicsError::WrongCount { .. })
    ));
    assert!(Stack { interference: vec![f64::NAN], ..good.clone() }.solve().is_err());
    assert!(Stack { outer_pressure: f64::INFINITY, ..good.clone() }.solve().is_err());
    assert!(Stack { inner_pressure: f64::NAN, ..good }.solve().is_err());
    let ring = steel_ring(25.0, 50.0);
    assert!(ring.stress_at(&RingLoad::default(), 0.020).is_err());
    assert!(ring.stress_at(&RingLoad { inner_pressure: f64::NAN, ..RingLoad::default() }, 0.030).is_err());
}

#[test]
fn loosening_speed_of_two_rings() {
    // Timoshenko & Goodier, § 32: ω = √(2 E δ/((3 + ν) ρ a b²)) for a solid shaft of the hub's material.
    let stack = steel_stack(&[0.0, 25.0, 50.0], &[50.0]);
    let speed = rotation::loosening_speed(&stack.rings[0], &stack.rings[1], 50e-6).unwrap().unwrap();
    assert_prints(speed, "3525.9059", 1.0);
    let closed_form = (2.0 * 200e9 * 50e-6 / (3.3 * 7800.0 * 0.025 * 0.050_f64.powi(2))).sqrt();
    assert_relative_eq!(speed, closed_form, max_relative = 1e-13);
    assert_relative_eq!(stack.loosening_speeds().unwrap()[0].unwrap(), speed, max_relative = 1e-12);
}

#[test]
fn a_joint_that_speed_does_not_loosen() {
    // A dense, soft shaft grows more than a light, stiff hub that is hardly larger.
    let shaft = RingSection::new(0.010, 0.025, 70e9, 0.33, 8000.0).unwrap();
    let hub = RingSection::new(0.025, 0.026, 400e9, 0.2, 2000.0).unwrap();
    assert_eq!(rotation::loosening_speed(&shaft, &hub, 10e-6).unwrap(), None);
    let stack = Stack {
        rings: vec![shaft, hub],
        interference: vec![10e-6],
        free_strain: vec![0.0; 2],
        ..Stack::default()
    };
    assert_eq!(stack.loosening_speeds().unwrap(), [None]);
    // A clearance is loose at standstill.
    assert_eq!(rotation::loosening_speed(&shaft, &hub, -10e-6).unwrap(), Some(0.0));
    assert_eq!(Stack { interference: vec![-10e-6], ..stack }.loosening_speeds().unwrap(), [Some(0.0)]);
}

#[test]
fn loosening_temperature_of_two_rings() {
    // Equal free growth of both faces: ΔT = δ/(d (αh − αs)); aluminium hub 23e-6, steel shaft 12e-6 /K.
    assert_prints(temperature::loosening_rise(50e-6, 0.05, 23e-6, 12e-6).unwrap().unwrap(), "90.909091", 1.0);
    // A hub that expands less loosens on cooling.
    assert_prints(
        temperature::loosening_rise(50e-6, 0.05, 12e-6, 23e-6).unwrap().unwrap(),
        "-90.909091",
        1.0,
    );
    assert_eq!(temperature::loosening_rise(50e-6, 0.05, 12e-6, 12e-6).unwrap(), None);
    assert!(temperature::loosening_rise(-50e-6, 0.05, 23e-6, 12e-6).is_err());
}

#[test]
fn loosening_temperature_along_a_curve() {
    let mut stack = steel_stack(&[0.0, 25.0, 50.0], &[50.0]);
    stack.rings[1] = RingSection::new(0.025, 0.05, 70e9, 0.33, 2700.0).unwrap();
    let straight = |kelvin: f64| vec![12e-6 * (kelvin - 293.15), 23e-6 * (kelvin - 293.15)];
    let found = |from: f64, to: f64| stack.loosening_temperature(0, straight, from, to).unwrap();
    assert_prints(found(293.15, 600.0).unwrap() - 293.15, "90.909091", 1.0);
    assert_eq!(found(293.15, 380.0), None);
    assert_eq!(found(293.15, 20.0), None);
    assert_eq!(found(500.0, 600.0), Some(500.0));
    // Strain difference 11e-6 t + 2e-9 t² = 1e-3: t = (√(121e-12 + 8e-12) − 11e-6)/4e-9 by the quadratic formula.
    let curved = |kelvin: f64| {
        let rise = kelvin - 293.15;
        vec![12e-6 * rise, 23e-6 * rise + 2e-9 * rise * rise]
    };
    let rise = ((129e-12_f64).sqrt() - 11e-6) / 4e-9;
    let found = stack.loosening_temperature(0, curved, 293.15, 600.0).unwrap().unwrap();
    assert_relative_eq!(found - 293.15, rise, max_relative = 1e-10);
    assert!(stack.loosening_temperature(1, curved, 293.15, 600.0).is_err());
    assert!(stack.loosening_temperature(0, |_| vec![f64::NAN; 2], 293.15, 600.0).is_err());
}

#[test]
fn stress_of_a_ring_through_which_heat_flows() {
    // Timoshenko & Goodier, 3rd ed., chapter 13 (there for a long cylinder, E/(1 − ν) in place of E): bore hotter
    // by αΔT, σφ(a) = E αΔT/(2 ln(b/a)) (1 − 2 b²/(b² − a²) ln(b/a)), σφ(b) = E αΔT/(2 ln(b/a)) (1 − 2 a²/(b² − a²)
    // ln(b/a)); 25/50 mm, 200 GPa, αΔT = 1.2e-3.
    let ring = steel_ring(25.0, 50.0);
    let load = RingLoad { free_strain: 1.2e-3, strain_rise: -1.2e-3, ..RingLoad::default() };
    let logarithm = 2.0_f64.ln();
    let scale = 200e9 * 1.2e-3 / (2.0 * logarithm);
    let (bore, rim) = (ring.stress_at(&load, 0.025).unwrap(), ring.stress_at(&load, 0.050).unwrap());
    assert_relative_eq!(bore.hoop, scale * (1.0 - 8.0 / 3.0 * logarithm), max_relative = 1e-12);
    assert_relative_eq!(rim.hoop, scale * (1.0 - 2.0 / 3.0 * logarithm), max_relative = 1e-12);
    assert!(bore.radial.abs() < 1e-6 && rim.radial.abs() < 1e-6);
    // Both faces grow by the mean over the area.
    let growth = temperature::free_growth(&ring, 1.2e-3, 0.0).unwrap();
    assert_relative_eq!(ring.displacement_at(&load, 0.025).unwrap(), growth * 0.025, max_relative = 1e-12);
    assert_relative_eq!(ring.displacement_at(&load, 0.050).unwrap(), growth * 0.050, max_relative = 1e-12);
    // A thin wall: ±E αΔT/2 (the bending of a plate), here to the first order of the wall over the radius.
    let thin = steel_ring(1000.0, 1000.1);
    let face = |radius: f64| thin.stress_at(&load, radius).unwrap().hoop;
    assert_relative_eq!(face(1.0), -0.5 * 200e9 * 1.2e-3, max_relative = 1e-4);
    assert_relative_eq!(face(1.0001), 0.5 * 200e9 * 1.2e-3, max_relative = 1e-4);
    let solid = steel_ring(0.0, 25.0);
    assert!(solid.stress_at(&load, 0.010).is_err());
    assert!(temperature::free_growth(&solid, 1e-3, 0.0).is_err());
    assert_eq!(temperature::free_growth(&solid, 1e-3, 1e-3).unwrap(), 1e-3);
}
