//! What the joint at work costs: stacks of 2 to 200 rings, and the check of two rings in five duty states.
//!
//! Run with `cargo bench --bench service`. Before the benches, the time for each ring of 25 to 200 rings is measured and
//! must stay level: the pressures come from a tridiagonal system.

use std::hint::black_box;
use std::path::Path;
use std::time::Instant;

use divan::Bencher;
use hubgrip::findings::compute;
use hubgrip::joint::{Joint, read};
use hubgrip::material::library::Library;
use hubgrip::mechanics::ring::RingSection;
use hubgrip::mechanics::stack::Stack;
use hubgrip::population::kernel::{PairKind, PlainJoint};

const RINGS: [usize; 7] = [2, 6, 12, 25, 50, 100, 200];

/// How much dearer a ring may be in 200 rings than in 25, for the noise of a busy machine; a dense solution would be
/// 64 times dearer.
const LEVEL: f64 = 3.0;

fn main() {
    let small = nanoseconds_a_ring(25);
    let large = nanoseconds_a_ring(200);
    println!(
        "time for each ring: {small:.0} ns in 25 rings, {large:.0} ns in 200, ratio {:.2}",
        large / small
    );
    assert!(large < LEVEL * small, "the cost of a ring grows with their number");
    divan::main();
}

/// Rings with walls of 5 mm round a bore of 20 mm, each with 20 µm on the next.
fn stack(rings: usize) -> Stack {
    let wall = |k: usize| 0.01 + 0.005 * k as f64;
    let ring = |k: usize| RingSection::new(wall(k), wall(k + 1), 200e9, 0.3, 7800.0).expect("a ring");
    Stack {
        rings: (0..rings).map(ring).collect(),
        interference: vec![20e-6; rings - 1],
        free_strain: vec![0.0; rings],
        ..Stack::default()
    }
}

/// The least of several runs, which noise only lengthens.
fn nanoseconds_a_ring(rings: usize) -> f64 {
    let stack = stack(rings);
    let run = || {
        let start = Instant::now();
        for _ in 0..20 {
            black_box(black_box(&stack).solve().expect("it can be solved"));
        }
        start.elapsed().as_nanos() as f64 / (20 * rings) as f64
    };
    (0..50).map(|_| run()).fold(f64::INFINITY, f64::min)
}

#[divan::bench(args = RINGS)]
fn solve_a_stack(bencher: Bencher, rings: usize) {
    let stack = stack(rings);
    bencher.bench_local(|| black_box(&stack).solve());
}

#[divan::bench(args = RINGS)]
fn opening_speeds_of_a_stack(bencher: Bencher, rings: usize) {
    let stack = stack(rings);
    bencher.bench_local(|| black_box(&stack).loosening_speeds());
}

/// Two rings with five duty states.
fn joint() -> Joint {
    let text = "joint_file: 1\ndiameter: 60 mm\nlength: 70 mm\nshaft: {material: C45+N}\n\
                hub: {material: 42CrMo4+QT, outer_diameter: 110 mm}\nfit: H7/s6\nduty:\n  \
                - {state: rated, torque: 900 N.m, speed: 1450 rpm, temperature: 60 degC}\n  \
                - {state: start, torque: 1.8 kN.m, shaft_temperature: 20 degC, hub_temperature: 45 degC}\n  \
                - {state: overspeed, torque: 500 N.m, speed: 3600 rpm, temperature: 60 degC}\n  \
                - {state: cold, torque: 900 N.m, temperature: -20 degC}\n  \
                - {state: bent, torque: 900 N.m, bending_moment: 300 N.m, radial_force: 2 kN}\n";
    read::read(text, Path::new("five.yaml"), &[], &Library::built_in()).expect("the joint is right")
}

/// Everything, with worksheet, plots' data and sentences.
#[divan::bench]
fn full_check_of_two_rings_in_five_states(bencher: Bencher) {
    let joint = joint();
    bencher.with_inputs(|| joint.clone()).bench_local_values(|joint| compute(black_box(joint)));
}

/// Both extremes at the shop and in all five states: pressures, stresses, safeties.
#[divan::bench]
fn kernel_of_two_rings_in_five_states(bencher: Bencher) {
    let plain = PlainJoint::of(&joint()).expect("two plain rings");
    bencher.bench_local(|| {
        let mut safety = f64::INFINITY;
        for (made, kind) in [(23e-6, PairKind::Loosest), (72e-6, PairKind::Tightest)] {
            let effective = black_box(&plain).effective(black_box(made), kind);
            for state in &plain.states {
                let found = plain.state(state, effective);
                safety = found.slip_safety.map_or(safety, |slip| safety.min(slip));
                safety = found.hub.safety.map_or(safety, |hub| safety.min(hub));
            }
        }
        safety
    });
}
