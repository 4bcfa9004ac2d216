//! What holds for every joint with a plastic hub.

use hubgrip::mechanics::criteria;
use hubgrip::mechanics::plastic::{HubYield, PlasticJoint, PlasticState, Regime, YieldRule};
use hubgrip::mechanics::ring::Stress;
use hubgrip::mechanics::two_rings::TwoRings;
use proptest::prelude::*;

use super::modified;

/// Joints of all rules, wall thicknesses and materials, on a shaft too strong to yield.
fn joints() -> impl Strategy<Value = PlasticJoint> {
    let rule =
        prop_oneof![Just(YieldRule::Tresca), Just(YieldRule::ModifiedTresca), Just(YieldRule::VonMises)];
    let bore_ratio = prop_oneof![Just(0.0), 0.01..0.7];
    let sizes = (0.002..2.0, 0.03..0.98, bore_ratio);
    let materials = (60e9..220e9, 60e9..220e9, 0.0..0.48, 0.0..0.48, 80e6..1000e6);
    (rule, sizes, materials).prop_map(|(rule, (diameter, ratio, bore_ratio), (eh, es, nh, ns, strength))| {
        let rings = TwoRings {
            diameter,
            hub_outer_diameter: diameter / ratio,
            shaft_bore: diameter * bore_ratio,
            hub_youngs_modulus: eh,
            hub_poisson: nh,
            shaft_youngs_modulus: es,
            shaft_poisson: ns,
        };
        let input = HubYield { rings, rule, hub_yield_strength: strength, shaft_yield_strength: 1e12 };
        PlasticJoint::new(input).unwrap()
    })
}

/// A joint and its state at a share of the way from the onset of yield to the limit, or beyond it.
fn states() -> impl Strategy<Value = (PlasticJoint, PlasticState)> {
    (joints(), 0.0..1.2).prop_map(|(joint, share)| {
        let limits = *joint.limits();
        let (from, to) = (limits.onset_interference, limits.limit_interference);
        let state = joint.solve(from + share * (to - from)).unwrap();
        (joint, state)
    })
}

/// ∫ f(r) dr over the wall by Gauss's two-point rule, split at the edge of the plastic zone.
///
/// In the zone r = a + (c − a) t², since at the pressure cap the hoop stress leaves the bore like √(r − a).
fn over_the_wall(joint: &PlasticJoint, state: &PlasticState, f: impl Fn(f64) -> f64) -> f64 {
    let rings = joint.input().rings;
    let (bore, rim) = (0.5 * rings.diameter, 0.5 * rings.hub_outer_diameter);
    let edge = (0.5 * state.plastic_diameter).min(rim);
    let plastic = gauss(0.0, 1.0, |t| 2.0 * t * (edge - bore) * f(bore + (edge - bore) * t * t));
    let elastic = gauss(edge.ln(), rim.ln(), |log| log.exp() * f(log.exp().min(rim)));
    plastic + elastic
}

fn gauss(from: f64, to: f64, f: impl Fn(f64) -> f64) -> f64 {
    let width = (to - from) / 400.0;
    let node = 0.5 / 3.0_f64.sqrt();
    (0..400)
        .flat_map(|index| [f64::from(index) + 0.5 - node, f64::from(index) + 0.5 + node])
        .map(|place| 0.5 * width * f(from + place * width))
        .sum()
}

/// Equivalent stress by the joint's rule over the value at which it yields.
fn utilisation(joint: &PlasticJoint, stress: Stress) -> f64 {
    let strength = joint.input().hub_yield_strength;
    match joint.input().rule {
        YieldRule::Tresca => criteria::tresca(stress.radial, stress.hoop) / strength,
        YieldRule::ModifiedTresca => criteria::tresca(stress.radial, stress.hoop) / modified(strength),
        YieldRule::VonMises => criteria::von_mises(stress.radial, stress.hoop) / strength,
    }
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(64))]

    #[test]
    fn plastic_meets_elastic_at_the_onset_without_a_kink(joint in joints()) {
        let limits = *joint.limits();
        let onset = limits.onset_interference;
        let elastic = joint.input().rings.pressure(onset).unwrap();
        prop_assert!((elastic / limits.onset_pressure - 1.0).abs() < 1e-13);
        let step = 1e-5 * (limits.limit_interference - onset).min(onset);
        let pressure = |interference: f64| joint.solve(interference).unwrap().pressure;
        let (before, at, after) = (pressure(onset - step), pressure(onset), pressure(onset + step));
        prop_assert!((at / limits.onset_pressure - 1.0).abs() < 1e-13);
        // The slope changes by no more than the curvature over one step.
        prop_assert!(((after - at) / (at - before) - 1.0).abs() < 1e-3, "{before} {at} {after}");
    }

    #[test]
    fn neighbouring_numbers_of_the_ends_are_solved(joint in joints()) {
        let limits = *joint.limits();
        let (onset, limit) = (limits.onset_interference, limits.limit_interference);
        for interference in [onset.next_down(), onset.next_up(), limit.next_down(), limit.next_up()] {
            prop_assert!(joint.solve(interference).is_ok(), "{interference}");
        }
    }

    #[test]
    fn pressure_rises_with_interference_to_its_limit((joint, state) in states(), more in 1e-6..0.5) {
        let limits = *joint.limits();
        let next = joint.solve(state.interference * (1.0 + more)).unwrap();
        if state.regime == Regime::ElasticPlastic {
            prop_assert!(next.pressure > state.pressure && next.plastic_ratio > state.plastic_ratio);
        } else {
            prop_assert_eq!(next.pressure, limits.limit_pressure);
        }
        prop_assert!(next.pressure <= limits.limit_pressure && next.pressure <= next.elastic_pressure);
        prop_assert!(next.permanent.bore > state.permanent.bore);
    }

    #[test]
    fn parts_share_the_interference((joint, state) in states()) {
        let sum = state.bore_growth + state.shaft_reduction;
        prop_assert!((sum / state.interference - 1.0).abs() < 1e-14);
        if state.regime == Regime::ElasticPlastic {
            let back = joint.interference_at(state.plastic_ratio).unwrap();
            prop_assert!((back / state.interference - 1.0).abs() < 1e-13);
        }
    }

    #[test]
    fn stresses_are_in_equilibrium((joint, state) in states()) {
        let half = 0.5 * joint.input().rings.diameter * state.pressure;
        let loaded = over_the_wall(&joint, &state, |r| state.stress_at(r).unwrap().hoop);
        prop_assert!((loaded / half - 1.0).abs() < 1e-9, "loaded {loaded} against {half}");
        let residual = over_the_wall(&joint, &state, |r| state.residual_at(r).unwrap().hoop);
        prop_assert!(residual.abs() < 1e-9 * half, "residual {residual} against {half}");
    }

    #[test]
    fn stress_yields_in_the_zone_and_nowhere_else((joint, state) in states()) {
        for point in state.profile(30).unwrap() {
            let used = utilisation(&joint, point.loaded);
            if 2.0 * point.radius < state.plastic_diameter {
                prop_assert!((used - 1.0).abs() < 1e-12, "{used} in the zone");
            } else {
                prop_assert!(used < 1.0 + 1e-12, "{used} outside the zone");
            }
        }
        let bore = state.stress_at(0.5 * joint.input().rings.diameter).unwrap();
        prop_assert!((bore.radial / -state.pressure - 1.0).abs() < 1e-12);
    }

    #[test]
    fn removal_without_the_flag_stays_elastic_all_through_the_wall((joint, state) in states()) {
        let strength = joint.input().hub_yield_strength;
        let worst = state
            .profile(60)
            .unwrap()
            .iter()
            .map(|point| criteria::von_mises(point.residual.radial, point.residual.hoop) / strength)
            .fold(0.0, f64::max);
        prop_assert_eq!(state.permanent.reverse_yield, worst > 1.0);
    }

    #[test]
    fn only_strength_over_modulus_and_ratios_matter((joint, state) in states(), size in 0.1..10.0_f64, stiffness in 0.1..10.0_f64) {
        let mut input = *joint.input();
        input.rings.diameter *= size;
        input.rings.hub_outer_diameter *= size;
        input.rings.shaft_bore *= size;
        input.rings.hub_youngs_modulus *= stiffness;
        input.rings.shaft_youngs_modulus *= stiffness;
        input.hub_yield_strength *= stiffness;
        input.shaft_yield_strength *= stiffness;
        let scaled = PlasticJoint::new(input).unwrap().solve(size * state.interference).unwrap();
        prop_assert!((scaled.pressure / (stiffness * state.pressure) - 1.0).abs() < 1e-11);
        prop_assert!((scaled.bore_growth / (size * state.bore_growth) - 1.0).abs() < 1e-11);
    }

    // Work of the contact pressure on the bore = elastic energy of the hub + plastic dissipation. On the face
    // σφ − σr = S0 the plastic hoop strain is S0 ((c/r)² − 1)/E and S0 times it is dissipated.
    #[test]
    fn work_of_the_contact_pressure_is_stored_or_dissipated((joint, _) in states(), share in 0.05..0.95) {
        let input = HubYield { rule: YieldRule::Tresca, ..*joint.input() };
        let joint = PlasticJoint::new(input).unwrap();
        let limits = *joint.limits();
        let zeta = 1.0 + share * (limits.limit_plastic_ratio - 1.0);
        let at = |zeta: f64| joint.solve(joint.interference_at(zeta).unwrap()).unwrap();
        let (onset, end) = (joint.solve(limits.onset_interference).unwrap(), at(zeta));
        let (a, e, nu) = (0.5 * input.rings.diameter, input.rings.hub_youngs_modulus, input.rings.hub_poisson);

        let intervals = 60;
        let place = |part: f64| 1.0 + (zeta - 1.0) * part / f64::from(intervals);
        let work: f64 = (0..intervals)
            .map(|index| [f64::from(index), f64::from(index) + 0.5, f64::from(index) + 1.0].map(|part| at(place(part))))
            .map(|[left, middle, right]| {
                // Simpson's rule for p du, the slopes of u from the parabola through the three states.
                let [u0, u1, u2] = [left, middle, right].map(|state| 0.5 * a * state.bore_growth);
                (left.pressure * (4.0 * u1 - 3.0 * u0 - u2)
                    + 4.0 * middle.pressure * (u2 - u0)
                    + right.pressure * (u0 - 4.0 * u1 + 3.0 * u2))
                    / 6.0
            })
            .sum::<f64>()
            + 0.25 * a * onset.pressure * onset.bore_growth;

        let stored = over_the_wall(&joint, &end, |r| {
            let Stress { radial, hoop } = end.stress_at(r).unwrap();
            0.5 * r * (radial * radial + hoop * hoop - 2.0 * nu * radial * hoop) / e
        });
        let s0 = input.hub_yield_strength;
        let dissipated = s0 * s0 / e * a * a * (zeta * zeta * zeta.ln() - 0.5 * (zeta * zeta - 1.0));
        prop_assert!(((stored + dissipated) / work - 1.0).abs() < 1e-8, "{stored} + {dissipated} against {work}");
    }
}
