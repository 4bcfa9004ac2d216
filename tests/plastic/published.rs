//! Published worked examples of yielding thick cylinders, and what they can say about a hub in plane stress.

use approx::assert_relative_eq;
use hubgrip::mechanics::plastic::tresca::TrescaHub;
use hubgrip::mechanics::plastic::von_mises::VonMisesHub;
use hubgrip::mechanics::plastic::{HubLimitKind, HubYield, PlasticJoint, YieldRule};
use hubgrip::mechanics::two_rings::TwoRings;

use super::modified;

/// Asserts that a value in MPa rounds to the printed one, `digit` being its last place.
fn rounds_to(found: f64, printed: f64, digit: f64) {
    let found = found / 1e6;
    assert!((found - printed).abs() <= 0.5 * digit, "found {found} MPa, printed {printed} MPa");
}

// Boresi & Schmidt, Advanced Mechanics of Materials, example 11.6: autofrettage, radii 20 and 40 mm, yield 450 MPa.
// The book's cylinder has closed ends and yields after von Mises with the axial stress midway, which bounds
// σφ − σr by 2Y/√3: the modified rule. Its axial stresses (−100.36 and −110.21 MPa) have no counterpart in a hub
// with free ends and are left out. The example was read in the book's companion code.
#[test]
fn autofrettage_of_boresi_and_schmidt() {
    let cylinder = TrescaHub::new(modified(450e6), 0.5).unwrap();
    let limit = cylinder.limit().unwrap();
    assert_eq!(limit.kind, HubLimitKind::FullyPlastic);
    let hoop = cylinder.stress_at(limit.plastic_ratio, 1.0).unwrap().hoop;
    rounds_to(hoop, 159.45, 0.01);

    let residual = hoop - limit.pressure * (1.0 + 0.25) / (1.0 - 0.25);
    rounds_to(0.5 * residual, -220.42, 0.01);

    let safety = 1.8;
    rounds_to(cylinder.onset_pressure() / safety, 108.25, 0.01);
    let raised = TrescaHub::new(modified(450e6) - 0.5 * residual, 0.5).unwrap();
    rounds_to(raised.onset_pressure() / safety, 154.17, 0.01);
}

// Boresi & Schmidt, Advanced Mechanics of Materials, example 11.4: open ends, radii 10 and 50 mm, 300 MPa with a
// factor of 1.75, octahedral shear stress criterion. Printed: yield stress needed 947.47 MPa.
#[test]
fn least_yield_stress_of_boresi_and_schmidt() {
    let onset_per_yield = VonMisesHub::new(1.0, 0.2).unwrap().onset_pressure();
    rounds_to(1.75 * 300e6 / onset_per_yield, 947.47, 0.01);
}

// Strength-of-materials exercise without printed answers: diameters 100 and 200 mm, yield 450 MPa, Tresca. The
// expected values follow from the form the textbooks give, Y (ln(c/a) + (b² − c²)/(2b²)), plastic to 75 mm.
#[test]
fn first_yield_and_full_plasticity_of_a_textbook_cylinder() {
    let cylinder = TrescaHub::new(450e6, 0.5).unwrap();
    rounds_to(cylinder.onset_pressure(), 168.75, 1e-6);
    rounds_to(cylinder.pressure(1.5).unwrap(), 280.896799, 1e-6);
    rounds_to(cylinder.limit().unwrap().pressure, 311.916231, 1e-6);
}

// 60 H7/x6 at its largest interference of 141 µm, hub 110 mm, E = 210 GPa. No chain with all numbers could be found
// in print; the values were computed from the formulas of the Westsächsische Hochschule Zwickau course sheet
// "Berechnungsgleichungen für Pressverbindungen II" (2013) and by integrating the displacement through the zone.
#[test]
fn joint_of_one_steel_beyond_its_elastic_limit() {
    let rings = TwoRings {
        diameter: 0.06,
        hub_outer_diameter: 0.11,
        shaft_bore: 0.0,
        hub_youngs_modulus: 210e9,
        hub_poisson: 0.3,
        shaft_youngs_modulus: 210e9,
        shaft_poisson: 0.3,
    };
    let joint = |rule| {
        let input = HubYield { rings, rule, hub_yield_strength: 355e6, shaft_yield_strength: 430e6 };
        PlasticJoint::new(input).unwrap()
    };
    let check = |rule, zeta: f64, pressure: f64, share: f64, growth: f64| {
        let state = joint(rule).solve(141e-6).unwrap();
        assert_relative_eq!(state.plastic_ratio, zeta, max_relative = 5e-9);
        assert_relative_eq!(state.pressure, pressure, max_relative = 5e-9);
        assert_relative_eq!(state.plastic_share, share, max_relative = 5e-9);
        assert_relative_eq!(state.permanent.bore, growth, max_relative = 5e-9);
        assert_relative_eq!(state.elastic_pressure, 173336777.0, max_relative = 5e-9);
    };
    check(YieldRule::Tresca, 1.17904234, 162556177.0, 0.165236123, 8.76942939e-6);
    check(YieldRule::ModifiedTresca, 1.09722253, 169579205.0, 0.0863564979, 3.05657928e-6);

    let limits = *joint(YieldRule::Tresca).limits();
    assert_relative_eq!(limits.onset_pressure, 124690083.0, max_relative = 5e-9);
    assert_relative_eq!(limits.quoted_hub.exact, 141901440.0, max_relative = 5e-9);
    assert_relative_eq!(limits.quoted_hub.quoted, 143979706.0, max_relative = 5e-9);
    assert_relative_eq!(limits.quoted_shaft.exact, 430e6, max_relative = 1e-12);
    assert_relative_eq!(limits.quoted_shaft.quoted, 496521232.0, max_relative = 5e-9);
}
