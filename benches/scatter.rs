//! What a population costs: random pairs beside the random numbers alone, the integration, the matching.
//!
//! Run with `cargo bench --bench scatter`. All cores are used for the random pairs and for the numbers alone.

use std::path::Path;

use divan::counter::ItemsCount;
use divan::{Bencher, black_box};
use hubgrip::joint::read;
use hubgrip::material::Range;
use hubgrip::material::library::Library;
use hubgrip::population::monte_carlo::sampler::Sampler;
use hubgrip::population::monte_carlo::{self, BLOCK};
use hubgrip::population::scatter::analysis::Analysis;
use hubgrip::population::scatter::model::Model;
use hubgrip::population::scatter::simulation::Simulation;
use hubgrip::population::scatter::understood::understood;
use hubgrip::population::sort::matching::greatest_matching;

const SPEED: &str = include_str!("../examples/population/speed.yaml");
const SAMPLES: u64 = 20_000_000;

fn main() {
    divan::main();
}

fn model() -> Model {
    let joint = read::read(SPEED, Path::new("speed.yaml"), &[], &Library::built_in()).expect("it is right");
    understood(&joint, &mut |_, _| Ok(Vec::new())).expect("it can be understood").model
}

#[divan::bench(sample_count = 10)]
fn random_pairs(bencher: Bencher) {
    let model = model();
    let analysis = Analysis::of(&model).expect("it can be integrated");
    bencher.counter(ItemsCount::new(SAMPLES)).bench_local(|| {
        Simulation::run(black_box(&model), 1.5, SAMPLES, 1, |quantity| analysis.support(quantity))
    });
}

#[divan::bench(sample_count = 10)]
fn random_numbers_alone(bencher: Bencher) {
    let population = model().population;
    let all =
        [&population.hole, &population.shaft, &population.friction, &population.pressing].map(Sampler::of);
    bencher.counter(ItemsCount::new(SAMPLES)).bench_local(|| {
        monte_carlo::run(
            1,
            SAMPLES,
            || 0u64,
            |last, generator, size| {
                let mut block = vec![0.0; BLOCK];
                for _ in 0..size / BLOCK as u64 {
                    for sampler in &all {
                        sampler.fill(generator, &mut block);
                        *last = last.wrapping_add(black_box(&block)[0].to_bits());
                    }
                }
            },
            |a, b| a.wrapping_add(b),
        )
    });
}

#[divan::bench(sample_count = 10)]
fn integration(bencher: Bencher) {
    let model = model();
    bencher.bench_local(|| {
        let analysis = Analysis::of(black_box(&model)).expect("it can be integrated");
        analysis.slip(0, 1.0) + analysis.exceeds(0, 100e6)
    });
}

#[divan::bench]
fn matching_of_100_000_parts(bencher: Bencher) {
    let sizes = |seed: u64| -> Vec<f64> {
        (0..100_000u64).map(|i| ((i * 2_654_435_761 + seed) % 24_000) as f64 * 1e-9).collect()
    };
    let (holes, shafts) = (sizes(1), sizes(7919));
    let band = Range { low: -2e-6, high: 2e-6 };
    bencher.bench_local(|| greatest_matching(black_box(&holes), black_box(&shafts), band));
}
