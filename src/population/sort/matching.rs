//! Pairs of measured parts: as many as possible within a band of interference.
//!
//! A hole h goes with the shafts from h + band.low to h + band.high. All these intervals are equally long, so in
//! order of size neither their lower nor their upper ends ever step back. Then the greedy pairing is a greatest one:
//! go through the holes in rising order and give each the smallest shaft that is left and large enough. A shaft too
//! small for this hole is too small for all that follow; and if a greatest matching gives this hole a larger
//! shaft, the two shafts can be exchanged without losing a pair (F. Glover, *Maximum Matching in a Convex Bipartite
//! Graph*, Naval Research Logistics Quarterly 14 (1967) 313–316). Sorting costs O(n log n), pairing O(n).

use super::SAME;
use crate::material::Range;

/// A hole and a shaft that go together, by their places in the lists.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Pair {
    /// Place of the hole.
    pub hole: usize,
    /// Place of the shaft.
    pub shaft: usize,
}

/// As many pairs as can be made with an interference (shaft minus hole) within the band, in order of size.
///
/// Sizes and band in the same unit, m; ends of the band belong to it. Values that are not finite find no mate.
///
/// # Example
/// ```
/// use hubgrip::material::Range;
/// use hubgrip::population::sort::matching::greatest_matching;
/// let pairs = greatest_matching(&[0.0, 5e-6], &[34e-6, 30e-6], Range { low: 29e-6, high: 31e-6 });
/// assert_eq!(pairs.len(), 2);
/// assert_eq!((pairs[0].hole, pairs[0].shaft), (0, 1));
/// ```
pub fn greatest_matching(holes: &[f64], shafts: &[f64], band: Range) -> Vec<Pair> {
    let (holes, shafts) = (by_size(holes), by_size(shafts));
    let mut left = shafts.into_iter().peekable();
    let mut pairs = Vec::new();
    for (hole, size) in holes {
        let (least, most) = (size + band.low - SAME, size + band.high + SAME);
        while left.next_if(|(_, shaft)| *shaft < least).is_some() {}
        if let Some((shaft, _)) = left.next_if(|(_, shaft)| *shaft <= most) {
            pairs.push(Pair { hole, shaft });
        }
    }
    pairs
}

/// Places with sizes, smallest first; equal ones in the order of the list.
fn by_size(sizes: &[f64]) -> Vec<(usize, f64)> {
    let mut order: Vec<(usize, f64)> =
        sizes.iter().copied().enumerate().filter(|(_, size)| size.is_finite()).collect();
    order.sort_by(|a, b| a.1.total_cmp(&b.1).then(a.0.cmp(&b.0)));
    order
}

#[cfg(test)]
mod tests {
    use super::*;
    use rand::{Rng, SeedableRng};
    use rand_xoshiro::Xoshiro256PlusPlus;

    /// The greatest number of pairs by augmenting paths (C. Berge 1957), which knows nothing of intervals.
    fn by_augmenting(holes: &[f64], shafts: &[f64], band: Range) -> usize {
        fn seek(
            hole: usize,
            goes: &dyn Fn(usize, usize) -> bool,
            seen: &mut [bool],
            mate: &mut [Option<usize>],
        ) -> bool {
            for shaft in 0..mate.len() {
                if goes(hole, shaft) && !seen[shaft] {
                    seen[shaft] = true;
                    if mate[shaft].is_none_or(|other| seek(other, goes, seen, mate)) {
                        mate[shaft] = Some(hole);
                        return true;
                    }
                }
            }
            false
        }
        let goes = |hole: usize, shaft: usize| {
            let u = shafts[shaft] - holes[hole];
            u >= band.low - SAME && u <= band.high + SAME
        };
        let mut mate = vec![None; shafts.len()];
        (0..holes.len()).filter(|hole| seek(*hole, &goes, &mut vec![false; shafts.len()], &mut mate)).count()
    }

    #[test]
    fn the_number_of_pairs_is_that_of_an_independent_optimum() {
        let mut generator = Xoshiro256PlusPlus::seed_from_u64(5);
        let mut below = |n: u64| generator.next_u64() % n;
        let mut smaller_than_lists = 0;
        for _ in 0..3000 {
            let (n, m) = (below(13) as usize, below(13) as usize);
            let holes: Vec<f64> = (0..n).map(|_| below(25) as f64 * 1e-6).collect();
            let shafts: Vec<f64> = (0..m).map(|_| (42 + below(17)) as f64 * 1e-6).collect();
            let low = (25 + below(15)) as f64 * 1e-6;
            let band = Range { low, high: low + below(8) as f64 * 1e-6 };
            let pairs = greatest_matching(&holes, &shafts, band);
            assert_eq!(pairs.len(), by_augmenting(&holes, &shafts, band));
            smaller_than_lists += usize::from(pairs.len() < n.min(m));
            let mut used = (vec![false; n], vec![false; m]);
            for pair in pairs {
                let u = shafts[pair.shaft] - holes[pair.hole];
                assert!(u >= band.low - 2.0 * SAME && u <= band.high + 2.0 * SAME);
                assert!(!used.0[pair.hole] && !used.1[pair.shaft]);
                (used.0[pair.hole], used.1[pair.shaft]) = (true, true);
            }
        }
        assert!(smaller_than_lists > 1000, "the cases were too easy");
    }

    #[test]
    fn nothing_finds_nothing() {
        let band = Range { low: 1.0, high: 2.0 };
        assert!(greatest_matching(&[], &[1.0], band).is_empty());
        assert!(greatest_matching(&[f64::NAN], &[1.5], band).is_empty());
        assert_eq!(greatest_matching(&[0.0], &[1.0], band).len(), 1);
    }
}
