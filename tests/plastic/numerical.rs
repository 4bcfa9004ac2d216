//! The closed forms against finite elements.

use hubgrip::mechanics::plastic::{PlasticJoint, PlasticState, YieldRule};
use hubgrip::mechanics::two_rings::TwoRings;

use super::finite_elements::{Bore, Hub, Material, Surface};
use super::{PLAIN, joint, modified};

fn material(rule: YieldRule) -> Material {
    let (surface, yield_value) = match rule {
        YieldRule::Tresca => (Surface::Tresca, 300e6),
        YieldRule::ModifiedTresca => (Surface::Tresca, modified(300e6)),
        YieldRule::VonMises => (Surface::VonMises, 300e6),
    };
    Material { youngs_modulus: 200e9, poisson: 0.3, yield_value, surface }
}

fn of_ratio(rule: YieldRule, ratio: f64) -> PlasticJoint {
    joint(TwoRings { hub_outer_diameter: PLAIN.diameter / ratio, ..PLAIN }, rule)
}

fn state(rule: YieldRule, ratio: f64, zeta: f64) -> PlasticState {
    let joint = of_ratio(rule, ratio);
    joint.solve(joint.interference_at(zeta).unwrap()).unwrap()
}

/// The finite elements at the bore growth of a state.
fn pushed(state: &PlasticState, ratio: f64, fineness: usize) -> Hub {
    let mut hub = Hub::new(material(state.rule), 0.025, 0.025 / ratio, 50 * fineness);
    hub.go(Bore::Displacement(0.0), Bore::Displacement(0.5 * state.bore_growth), 50 * fineness);
    hub
}

/// Relative differences of finite elements and closed form at one bore growth.
#[derive(Debug)]
struct Differences {
    pressure: f64,
    rim: f64,
    /// Greatest difference of a stress, over the yield strength.
    stress: f64,
    /// Permanent growth of the bore.
    permanent: f64,
    /// Permanent growth of the outer diameter.
    permanent_rim: f64,
}

fn differences(rule: YieldRule, ratio: f64, zeta: f64, fineness: usize) -> Differences {
    let state = state(rule, ratio, zeta);
    let mut hub = pushed(&state, ratio, fineness);
    let pressure = hub.pressure();
    let rim = 2.0 * hub.rim_displacement() / state.rim_growth - 1.0;
    let apart = hub.stresses().map(|(radius, found)| {
        let expected = state.stress_at(radius).unwrap();
        (found[0] - expected.radial).abs().max((found[1] - expected.hoop).abs()) / 300e6
    });
    let stress = apart.fold(0.0, f64::max);
    hub.go(Bore::Pressure(pressure), Bore::Pressure(0.0), 40);
    let permanent = 2.0 * hub.bore_displacement() / state.permanent.bore - 1.0;
    let permanent_rim = 2.0 * hub.rim_displacement() / state.permanent.rim - 1.0;
    Differences { pressure: pressure / state.pressure - 1.0, rim, stress, permanent, permanent_rim }
}

/// Plastic zones of medium, thin and thick hubs; none yields in compression on removal.
const ZONES: [(f64, f64); 5] = [(0.5, 1.2), (0.5, 1.6), (0.5, 1.95), (0.8, 1.2), (0.3, 1.5)];

// The bounds are about twice what 200 elements and 200 steps show; halving both shows that it is the elements and
// steps that differ and not the closed form.
#[test]
fn tresca_agrees_with_finite_elements() {
    for rule in [YieldRule::Tresca, YieldRule::ModifiedTresca] {
        for (ratio, zeta) in ZONES {
            let coarse = differences(rule, ratio, zeta, 1);
            let fine = differences(rule, ratio, zeta, 4);
            assert!(fine.pressure.abs() < 4e-5, "{ratio} {zeta}: {fine:?}");
            assert!(fine.rim.abs() < 1e-5, "{ratio} {zeta}: {fine:?}");
            assert!(fine.stress < 1.3e-2, "{ratio} {zeta}: {fine:?}");
            assert!(fine.permanent.abs() < 1e-4, "{ratio} {zeta}: {fine:?}");
            assert!(fine.permanent_rim.abs() < 1e-4, "{ratio} {zeta}: {fine:?}");
            assert!(fine.pressure.abs() < 0.2 * coarse.pressure.abs(), "{ratio} {zeta}: {coarse:?} {fine:?}");
        }
    }
}

#[test]
fn von_mises_agrees_with_finite_elements() {
    for (ratio, zeta) in ZONES {
        let coarse = differences(YieldRule::VonMises, ratio, zeta, 1);
        let fine = differences(YieldRule::VonMises, ratio, zeta, 4);
        assert!(fine.pressure.abs() < 2e-4, "{ratio} {zeta}: {fine:?}");
        assert!(fine.rim.abs() < 5e-4, "{ratio} {zeta}: {fine:?}");
        assert!(fine.stress < 1.3e-2, "{ratio} {zeta}: {fine:?}");
        assert!(fine.permanent.abs() < 5e-4, "{ratio} {zeta}: {fine:?}");
        assert!(fine.permanent_rim.abs() < 2e-3, "{ratio} {zeta}: {fine:?}");
        assert!(fine.rim.abs() < 0.35 * coarse.rim.abs(), "{ratio} {zeta}: {coarse:?} {fine:?}");
    }
}

// Twice the growth at which the closed form becomes fully plastic: the pressure of the elements stays. Not for
// Tresca, where the free rim then stands in a corner of the hexagon and the elements find no equilibrium.
#[test]
fn finite_elements_meet_the_limit_pressure() {
    for ratio in [0.4, 0.5, 0.8] {
        let joint = of_ratio(YieldRule::VonMises, ratio);
        let state = joint.solve(2.0 * joint.limits().limit_interference).unwrap();
        let found = pushed(&state, ratio, 2).pressure();
        assert!((found / state.pressure - 1.0).abs() < 2e-4, "{ratio}: {found} {}", state.pressure);
    }
}

#[test]
fn growth_is_overstated_where_the_bore_yields_on_removal() {
    // Greatest overstatement found by the elements: 0.7 % (Tresca), 3.3 % (von Mises), near the pressure cap.
    for (rule, ratio, least, most) in [
        (YieldRule::Tresca, 0.34, 4e-3, 7e-3),
        (YieldRule::VonMises, 0.2, 2.5e-2, 3.3e-2),
        (YieldRule::VonMises, 0.4, 0.8e-2, 1.2e-2),
    ] {
        let reach = of_ratio(rule, ratio).limits().limit_plastic_ratio - 1.0;
        let zeta = 1.0 + 0.95 * reach;
        assert!(state(rule, ratio, zeta).permanent.reverse_yield);
        let over = -differences(rule, ratio, zeta, 2).permanent;
        assert!(over > least && over < most, "{rule:?} {ratio}: {over}");
    }
}

#[test]
fn work_of_the_contact_pressure_agrees_with_finite_elements() {
    for (ratio, zeta) in [(0.5, 1.6), (0.8, 1.2)] {
        let joint = of_ratio(YieldRule::VonMises, ratio);
        let end = state(YieldRule::VonMises, ratio, zeta);
        let onset = joint.solve(joint.limits().onset_interference).unwrap();
        // Elastic triangle, then Simpson's rule in the zone; per radian and length, as the elements count it.
        let mut work = 0.25 * onset.pressure * onset.bore_growth;
        let at = |zeta: f64| state(YieldRule::VonMises, ratio, zeta);
        let intervals = 100;
        for interval in 0..intervals {
            let place =
                |share: f64| 1.0 + (zeta - 1.0) * (f64::from(interval) + share) / f64::from(intervals);
            let (left, middle, right) = (at(place(0.0)), at(place(0.5)), at(place(1.0)));
            let mean = (left.pressure + 4.0 * middle.pressure + right.pressure) / 6.0;
            work += 0.5 * mean * (right.bore_growth - left.bore_growth);
        }
        let found = pushed(&end, ratio, 4).work();
        assert!((found / (work * 0.025) - 1.0).abs() < 1e-4, "{ratio} {zeta}: {found} {}", work * 0.025);
    }
}
