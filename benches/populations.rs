//! What many joints cost: one evaluation by the kernel, a choice among all fits, a table.
//!
//! Run with `cargo bench --bench populations`. The figures are those of the machine it runs on; compare ratios.

use std::path::Path;

use divan::counter::ItemsCount;
use divan::{Bencher, black_box};
use hubgrip::joint::{Joint, read};
use hubgrip::material::library::Library;
use hubgrip::population::batch::{Settings, run};
use hubgrip::population::choose::{Options, Standard, choose};
use hubgrip::population::kernel::{PairKind, PlainJoint};

const HUB: &str = include_str!("../examples/choose/hub-without-fit.yaml");
const BASE: &str = include_str!("../examples/batch/base.yaml");

/// Pairs of one evaluation of an array.
const PAIRS: usize = 10_000;
/// Rows of the table.
const ROWS: usize = 10_000;

fn main() {
    divan::main();
}

fn joint() -> Joint {
    let (file, library) = (Path::new("hub.yaml"), Library::built_in());
    read::read_without_fit(HUB.as_bytes(), file, &[], &library).expect("the example is right")
}

#[divan::bench]
fn prepare_a_joint(bencher: Bencher) {
    let joint = joint();
    bencher.bench_local(|| PlainJoint::of(black_box(&joint)));
}

#[divan::bench]
fn one_pair_in_every_state(bencher: Bencher) {
    let plain = PlainJoint::of(&joint()).expect("the example is a plain joint");
    bencher.bench_local(|| {
        let pair = plain.pair(black_box(70e-6), PairKind::Tightest).expect("it can be pressed");
        let states = plain.states.iter().map(|state| plain.state(state, pair.effective_interference));
        states.map(|state| state.pressure).sum::<f64>()
    });
}

#[divan::bench]
fn pressures_of_an_array(bencher: Bencher) {
    let plain = PlainJoint::of(&joint()).expect("the example is a plain joint");
    let made: Vec<f64> = (0..PAIRS).map(|k| k as f64 * 1e-8).collect();
    let mut effective = vec![0.0; PAIRS];
    let mut pressures = vec![0.0; PAIRS];
    bencher.counter(ItemsCount::new(PAIRS)).bench_local(|| {
        plain.smoothed(black_box(&made), &mut effective);
        plain.pressures(&plain.shop, &effective, &mut pressures);
        pressures[PAIRS - 1]
    });
}

#[divan::bench]
fn choose_among_all_iso_fits(bencher: Bencher) {
    let options = Options { standard: Standard::Iso286, finest: None };
    let joint = joint();
    bencher.with_inputs(|| joint.clone()).bench_local_values(|joint| choose(black_box(joint), options));
}

/// No fit is left: the smallest changes are sought as well.
#[divan::bench]
fn choose_in_vain(bencher: Bencher) {
    let options = Options { standard: Standard::Iso286, finest: None };
    let mut joint = joint();
    joint.duty.iter_mut().for_each(|state| state.torque *= 4.0);
    bencher.with_inputs(|| joint.clone()).bench_local_values(|joint| choose(black_box(joint), options));
}

fn table() -> String {
    let mut table =
        "diameter (mm),length (mm),hub.outer_diameter (mm),fit,duty.rated.torque (N.m)\n".to_owned();
    for row in 0..ROWS {
        let diameter = 40 + row % 61;
        let fit = ["H7/s6", "H7/u6", "H8/x8", "S7/h6", "H7/r6"][row % 5];
        table += &format!("{diameter},{},{},{fit},{}\n", 70 + row % 13, 2 * diameter, 100 + row % 977);
    }
    table
}

fn worked(bencher: Bencher, threads: usize) {
    let pool = rayon::ThreadPoolBuilder::new().num_threads(threads).build().expect("threads can be started");
    let (table, library) = (table(), Library::built_in());
    let settings = Settings { base: Some(BASE.to_owned()), ..Settings::default() };
    bencher.counter(ItemsCount::new(ROWS)).bench_local(|| {
        let mut output = Vec::new();
        let summary = pool.install(|| {
            run(black_box(table.as_bytes()), &mut output, None, &settings, &library, &mut |_| ())
        });
        (summary.expect("the table is right").rows, output.len())
    });
}

#[divan::bench]
fn table_on_one_core(bencher: Bencher) {
    worked(bencher, 1);
}

#[divan::bench]
fn table_on_two_cores(bencher: Bencher) {
    worked(bencher, 2);
}
