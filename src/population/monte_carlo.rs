//! Random pairs of parts: the same from a seed on any number of threads.
//!
//! Samples are drawn in chunks of fixed size. Chunk k has a stream of its own: the generator of the seed, moved on
//! by k jumps of 2¹²⁸ numbers. Chunks only count (how often, in which class), so the order in which threads
//! finish cannot change a digit.

pub mod estimate;
pub mod histogram;
pub mod sampler;

use rand::SeedableRng;
use rand_xoshiro::Xoshiro256PlusPlus;
use rayon::prelude::*;

/// Samples of one chunk.
pub const CHUNK: u64 = 1 << 16;

/// Samples that go through the formulas together.
pub const BLOCK: usize = 1 << 8;

/// Most samples that are drawn.
pub const MOST_SAMPLES: u64 = 10_000_000_000;

/// Generators of all chunks of a run.
///
/// Source: D. Blackman and S. Vigna, *Scrambled Linear Pseudorandom Number Generators*, ACM Transactions on
/// Mathematical Software 47 (2021) 36: xoshiro256++ and its jump of 2¹²⁸ steps.
fn streams(seed: u64, samples: u64) -> Vec<(Xoshiro256PlusPlus, u64)> {
    let mut generator = Xoshiro256PlusPlus::seed_from_u64(seed);
    let mut left = samples.min(MOST_SAMPLES);
    let mut all = Vec::new();
    while left > 0 {
        let size = left.min(CHUNK);
        all.push((generator.clone(), size));
        generator.jump();
        left -= size;
    }
    all
}

/// Runs every chunk into a tally of its own and adds the tallies up.
///
/// `chunk` draws the given number of samples into the tally; what it does to the tally must be exact (counting),
/// so that tallies add up to the same in any order.
pub fn run<T: Send>(
    seed: u64,
    samples: u64,
    empty: impl Fn() -> T + Sync + Send,
    chunk: impl Fn(&mut T, &mut Xoshiro256PlusPlus, u64) + Sync + Send,
    add: impl Fn(T, T) -> T + Sync + Send,
) -> T {
    streams(seed, samples)
        .into_par_iter()
        .fold(&empty, |mut tally, (mut generator, size)| {
            chunk(&mut tally, &mut generator, size);
            tally
        })
        .reduce(&empty, add)
}

#[cfg(test)]
mod tests {
    use super::*;
    use rand::Rng;

    #[test]
    fn the_result_does_not_depend_on_the_number_of_threads() {
        let total = |threads: usize| {
            let pool = rayon::ThreadPoolBuilder::new().num_threads(threads).build().unwrap();
            pool.install(|| {
                run(
                    7,
                    3 * CHUNK + 17,
                    || (0u64, 0u64),
                    |tally, generator, size| {
                        for _ in 0..size {
                            tally.0 += 1;
                            tally.1 = tally.1.wrapping_add(generator.next_u64());
                        }
                    },
                    |a, b| (a.0 + b.0, a.1.wrapping_add(b.1)),
                )
            })
        };
        assert_eq!(total(1), total(3));
        assert_eq!(total(1).0, 3 * CHUNK + 17);
    }
}
