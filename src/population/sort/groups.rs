//! Groups of holes and shafts that mate: their limits, the share that finds a mate, what is left over.

use super::{MOST_GROUPS, SAME, SortError};
use crate::material::Range;
use crate::population::distribution::Distribution;
use crate::population::integration::law::Law;
use crate::tolerance::Limits;

/// How the limits of the groups are set.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Grouping {
    /// Groups of equal width within the limits.
    EqualWidth,
    /// Groups with equal shares of the parts, so that no group has a surplus.
    EqualShare,
}

/// One group of holes with the group of shafts it mates with.
#[derive(Debug, Clone, PartialEq)]
pub struct Group {
    /// Limits of the holes, m from the nominal diameter.
    pub hole: Limits,
    /// Limits of the shafts, m from the nominal diameter.
    pub shaft: Limits,
    /// Share of all holes in it.
    pub hole_share: f64,
    /// Share of all shafts in it.
    pub shaft_share: f64,
    /// Least and greatest interference of any pair of it, m.
    pub interference: Range,
    /// Share of its pairs within the band, drawn at random.
    pub within: f64,
}

impl Group {
    /// Share of all parts that finds a mate in the group, of as many holes as shafts.
    pub fn mates(&self) -> f64 {
        self.hole_share.min(self.shaft_share)
    }

    /// Holes without a shaft; negative when it is shafts without a hole.
    pub fn surplus(&self) -> f64 {
        self.hole_share - self.shaft_share
    }

    /// Whether every pair lies within the band.
    pub fn is_within(&self, band: Range) -> bool {
        self.interference.low >= band.low - SAME && self.interference.high <= band.high + SAME
    }
}

/// All groups.
#[derive(Debug, Clone, PartialEq)]
pub struct Groups {
    /// From the smallest sizes to the largest.
    pub groups: Vec<Group>,
    /// Wanted band of interference, m.
    pub band: Range,
    /// Share of random pairs within the band when nothing is sorted.
    pub unsorted: f64,
    /// Share of the holes outside their limits.
    pub holes_outside: f64,
    /// Share of the shafts outside theirs.
    pub shafts_outside: f64,
}

impl Groups {
    /// Share of all parts that finds a mate.
    pub fn mates(&self) -> f64 {
        self.groups.iter().map(Group::mates).sum()
    }

    /// Share of all parts that finds a mate and an interference within the band.
    pub fn within(&self) -> f64 {
        self.groups.iter().map(|group| group.mates() * group.within).sum()
    }

    /// Whether every pair of every group lies within the band.
    pub fn all_within(&self) -> bool {
        self.groups.iter().all(|group| group.is_within(self.band))
    }
}

/// Holes and shafts with their limits.
#[derive(Debug, Clone, PartialEq)]
pub struct Lots {
    /// Distribution of the holes, m from the nominal diameter.
    pub holes: Distribution,
    /// Distribution of the shafts.
    pub shafts: Distribution,
    /// Limits of the holes.
    pub hole: Limits,
    /// Limits of the shafts.
    pub shaft: Limits,
}

impl Lots {
    /// `count` groups; the smallest holes mate with the smallest shafts.
    ///
    /// # Errors
    /// The number of groups is out of range, nothing lies within the limits.
    pub fn sorted(&self, count: usize, grouping: Grouping, band: Range) -> Result<Groups, SortError> {
        if count == 0 || count > MOST_GROUPS {
            return Err(SortError::Groups { given: count });
        }
        let edges = |parts: &Distribution, limits: Limits, what: &'static str| match grouping {
            Grouping::EqualWidth => Ok(slices(limits, count)),
            Grouping::EqualShare => equal_shares(parts, limits, count, what),
        };
        let hole = edges(&self.holes, self.hole, "hole")?;
        let shaft = edges(&self.shafts, self.shaft, "shaft")?;
        self.at(&hole, &shaft, band)
    }

    /// Groups between given limits.
    ///
    /// # Errors
    /// Limits that do not rise, or not as many for the holes as for the shafts.
    pub fn at(&self, hole_edges: &[f64], shaft_edges: &[f64], band: Range) -> Result<Groups, SortError> {
        let rises = |edges: &[f64]| edges.windows(2).all(|pair| pair[0] <= pair[1]);
        if hole_edges.len() != shaft_edges.len()
            || hole_edges.len() < 2
            || !rises(hole_edges)
            || !rises(shaft_edges)
        {
            return Err(SortError::Edges);
        }
        super::checked_band(band)?;
        let (holes, shafts) = (Law::of(&self.holes), Law::of(&self.shafts));
        let last = hole_edges.len() - 2;
        let groups = hole_edges
            .windows(2)
            .zip(shaft_edges.windows(2))
            .enumerate()
            .map(|(number, (hole, shaft))| {
                let hole = Limits { lower: hole[0], upper: hole[1] };
                let shaft = Limits { lower: shaft[0], upper: shaft[1] };
                let (hole_share, shaft_share) =
                    (share(&holes, hole, number == last), share(&shafts, shaft, number == last));
                let together = hole_share * shaft_share;
                Group {
                    hole,
                    shaft,
                    hole_share,
                    shaft_share,
                    interference: Range { low: shaft.lower - hole.upper, high: shaft.upper - hole.lower },
                    within: if together > 0.0 {
                        (joint_share(&holes, &shafts, hole, shaft, band, number == last) / together).min(1.0)
                    } else {
                        0.0
                    },
                }
            })
            .collect();
        let all = Limits { lower: f64::NEG_INFINITY, upper: f64::INFINITY };
        Ok(Groups {
            groups,
            band,
            unsorted: joint_share(&holes, &shafts, all, all, band, true),
            holes_outside: (1.0 - share(&holes, self.hole, true)).max(0.0),
            shafts_outside: (1.0 - share(&shafts, self.shaft, true)).max(0.0),
        })
    }

    /// Fewest groups of equal width of which every pair lies within the band; none up to [`MOST_GROUPS`].
    pub fn fewest(&self, band: Range) -> Option<usize> {
        (1..=MOST_GROUPS).find(|count| {
            let (hole, shaft) = (slices(self.hole, *count), slices(self.shaft, *count));
            hole.windows(2).zip(shaft.windows(2)).all(|(hole, shaft)| {
                shaft[0] - hole[1] >= band.low - SAME && shaft[1] - hole[0] <= band.high + SAME
            })
        })
    }
}

fn slices(limits: Limits, count: usize) -> Vec<f64> {
    let width = limits.upper - limits.lower;
    (0..=count)
        .map(|i| if i == count { limits.upper } else { limits.lower + width * i as f64 / count as f64 })
        .collect()
}

fn equal_shares(
    parts: &Distribution,
    limits: Limits,
    count: usize,
    what: &'static str,
) -> Result<Vec<f64>, SortError> {
    let law = Law::of(parts);
    let (before, within) = (law.below(limits.lower - grain(&law)), share(&law, limits, true));
    if within <= 0.0 {
        return Err(SortError::NothingWithin(what));
    }
    let quantile = |wanted: f64| {
        let (mut low, mut high) = (limits.lower, limits.upper);
        // Halving ends at the last bit of a size; it also works on values that come one by one.
        for _ in 0..80 {
            let middle = 0.5 * (low + high);
            if law.below(middle) < wanted { low = middle } else { high = middle }
        }
        0.5 * (low + high)
    };
    Ok((0..=count)
        .map(|i| match i {
            0 => limits.lower,
            i if i == count => limits.upper,
            i => quantile(before + within * i as f64 / count as f64),
        })
        .collect())
}

/// What rounding may part: nothing for a density, [`SAME`] for values that come one by one.
fn grain(law: &Law) -> f64 {
    match law {
        Law::Atoms(_) => SAME,
        Law::Curve(_) => 0.0,
    }
}

/// Share from the lower limit up to the upper one, which belongs to the last group only.
fn share(law: &Law, limits: Limits, with_upper: bool) -> f64 {
    let grain = grain(law);
    let edge = if with_upper { limits.upper + grain } else { limits.upper - grain };
    (law.below(edge) - law.below(limits.lower - grain)).max(0.0)
}

/// Share of all pairs of which the hole, the shaft and the interference lie within their limits.
fn joint_share(holes: &Law, shafts: &Law, hole: Limits, shaft: Limits, band: Range, with_upper: bool) -> f64 {
    let upper =
        |limits: Limits, grain: f64| if with_upper { limits.upper + grain } else { limits.upper - grain };
    let (of_holes, of_shafts) = (grain(holes), grain(shafts));
    let (from, to) = (hole.lower - of_holes, upper(hole, of_holes));
    let (least, most) = (shaft.lower - of_shafts, upper(shaft, of_shafts));
    let grain = of_holes.max(of_shafts);
    let (low, high) = (band.low - grain, band.high + grain);
    let mut breaks = vec![from, to];
    for edge in shafts.kinks().into_iter().chain([least, most]).filter(|edge| edge.is_finite()) {
        breaks.extend([edge - low, edge - high]);
    }
    holes.expect(&breaks, |h| {
        if h < from || h > to {
            return 0.0;
        }
        let (low, high) = (least.max(h + low), most.min(h + high));
        if low < high { (shafts.below(high) - shafts.below(low)).max(0.0) } else { 0.0 }
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    fn uniform() -> Lots {
        Lots {
            holes: Distribution::uniform(0.0, 24e-6).unwrap(),
            shafts: Distribution::uniform(42e-6, 58e-6).unwrap(),
            hole: Limits { lower: 0.0, upper: 24e-6 },
            shaft: Limits { lower: 42e-6, upper: 58e-6 },
        }
    }

    #[test]
    fn equal_slices_of_uniform_parts_leave_no_surplus() {
        let band = Range { low: 30e-6, high: 50e-6 };
        let groups = uniform().sorted(4, Grouping::EqualWidth, band).unwrap();
        for group in &groups.groups {
            assert!(group.surplus().abs() < 1e-12 && (group.mates() - 0.25).abs() < 1e-12);
        }
        // Group 1: holes 0 to 6, shafts 42 to 46 µm.
        let first = groups.groups[0].interference;
        assert!((first.low - 36e-6).abs() < 1e-15 && (first.high - 46e-6).abs() < 1e-15);
        // The last of N groups has holes from 24 − 24/N and shafts from 58 − 16/N: at least 34 − 16/N, 30 µm at N = 4.
        assert_eq!(uniform().fewest(band), Some(4));
        assert!(groups.all_within() && (groups.within() - 1.0).abs() < 1e-9);
        // Unsorted: 1 − two triangles of (30 − 18)²/2 and (58 − 50)²/2 over 24 × 16.
        let outside = (12.0 * 12.0 + 8.0 * 8.0) / 2.0 / (24.0 * 16.0);
        assert!((groups.unsorted - (1.0 - outside)).abs() < 1e-12, "{}", groups.unsorted);
    }

    #[test]
    fn equal_shares_leave_no_surplus_of_normal_parts() {
        let lots = Lots {
            holes: Distribution::normal(12e-6, 3e-6).unwrap(),
            shafts: Distribution::normal(49e-6, 4e-6).unwrap(),
            ..uniform()
        };
        let band = Range { low: 25e-6, high: 45e-6 };
        let by_share = lots.sorted(3, Grouping::EqualShare, band).unwrap();
        let by_width = lots.sorted(3, Grouping::EqualWidth, band).unwrap();
        let outside = (by_share.holes_outside - by_share.shafts_outside).abs() / 3.0;
        for group in &by_share.groups {
            assert!((group.surplus().abs() - outside).abs() < 1e-9);
        }
        assert!(by_width.mates() < by_share.mates());
    }

    #[test]
    fn measured_parts_on_a_limit_belong_to_the_group_above() {
        let lots = Lots {
            holes: Distribution::measured(&[0.0, 6e-6, 12e-6, 24e-6]).unwrap(),
            shafts: Distribution::measured(&[42e-6, 50e-6, 51e-6, 60e-6]).unwrap(),
            ..uniform()
        };
        let groups = lots.sorted(2, Grouping::EqualWidth, Range { low: 0.0, high: 1.0 }).unwrap();
        let shares: Vec<(f64, f64)> =
            groups.groups.iter().map(|group| (group.hole_share, group.shaft_share)).collect();
        assert_eq!(shares, [(0.5, 0.25), (0.5, 0.5)]);
        assert_eq!(groups.shafts_outside, 0.25);
    }

    #[test]
    fn bad_groups_are_refused() {
        let band = Range { low: 0.0, high: 1.0 };
        assert!(uniform().sorted(0, Grouping::EqualWidth, band).is_err());
        assert!(uniform().at(&[0.0, 1.0], &[0.0, 1.0, 2.0], band).is_err());
        assert!(uniform().sorted(2, Grouping::EqualWidth, Range { low: 1.0, high: 1.0 }).is_err());
    }
}
