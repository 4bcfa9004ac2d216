//! The walls of a joint side by side, and the stress through each.

use super::axis::Axis;
use crate::findings::{Findings, PairFindings, RingStress};
use crate::joint::{Allow, Ring};
use crate::material::Kind;
use crate::mechanics::criteria::{self, DuctileCriterion};
use crate::mechanics::plastic::{PlasticState, Regime, YieldRule};
use crate::mechanics::ring::{RingLoad, RingSection, Stress};
use crate::report::svg::Point;
use crate::report::units::{Measure, Units};

/// Points of each curve through one wall.
const POINTS: usize = 41;
/// Least share of the width that a wall is given.
const LEAST_SHARE: f64 = 0.27;

/// Stress in one ring against radius, Pa over m.
#[derive(Debug, Default)]
pub(super) struct Profile {
    pub hoop: Vec<Point>,
    pub radial: Vec<Point>,
    pub equivalent: Vec<Point>,
}

/// Where the joint is cut: radii of each ring (m) and its stresses there at both extremes.
pub(super) struct Cut {
    pub sizes: Vec<(f64, f64)>,
    pub loosest: Vec<RingStress>,
    pub tightest: Vec<RingStress>,
    /// Index of the slice of a stepped joint.
    pub slice: Option<usize>,
}

impl Cut {
    /// The whole joint; of a stepped one the slice whose hub is stressed most.
    pub(super) fn new(findings: &Findings) -> Self {
        let extremes = &findings.extremes;
        let hub = |index: usize| {
            let rings = extremes.tightest.slices.get(index).map(|slice| &slice.rings);
            rings.and_then(|rings| rings.last()).map_or(0.0, |ring| ring.equivalent)
        };
        let most = (0..extremes.tightest.slices.len()).max_by(|a, b| hub(*a).total_cmp(&hub(*b)));
        let cut = |pair: &PairFindings, index: usize| pair.slices.get(index).map(|slice| slice.rings.clone());
        let at = most.and_then(|index| {
            let slice = extremes.tightest.slices.get(index)?;
            let mating = findings.joint.diameter / 2.0;
            Some(Self {
                sizes: vec![(slice.shaft_bore / 2.0, mating), (mating, slice.hub_outer_diameter / 2.0)],
                loosest: cut(&extremes.loosest, index)?,
                tightest: cut(&extremes.tightest, index)?,
                slice: Some(index),
            })
        });
        at.unwrap_or_else(|| Self {
            sizes: findings
                .joint
                .rings
                .iter()
                .map(|ring| (ring.inner_diameter / 2.0, ring.outer_diameter / 2.0))
                .collect(),
            loosest: extremes.loosest.rings.clone(),
            tightest: extremes.tightest.rings.clone(),
            slice: None,
        })
    }

    /// Profiles of both pairs, loosest first; a hub that yields by design is shown as it yields.
    pub(super) fn profiles(&self, findings: &Findings) -> (Vec<Profile>, Vec<Profile>) {
        let joint = &findings.joint;
        let of = |stresses: &[RingStress]| -> Vec<Profile> {
            let rings = joint.rings.iter().zip(&self.sizes).zip(stresses);
            rings.map(|((ring, size), stress)| profile(ring, *size, stress, joint.criterion)).collect()
        };
        let (mut loosest, mut tightest) = (of(&self.loosest), of(&self.tightest));
        if let Some((low, high)) = plastic(findings) {
            for (profiles, state) in [(&mut loosest, low), (&mut tightest, high)] {
                if let (Some(last), Some(size)) = (profiles.last_mut(), self.sizes.last()) {
                    *last = plastic_profile(*size, state);
                }
            }
        }
        (loosest, tightest)
    }
}

/// The plastic states of the loosest and the tightest pair, when the hub may yield and does.
pub(super) fn plastic(findings: &Findings) -> Option<(&PlasticState, &PlasticState)> {
    let plastic = findings.service.plastic.as_ref()?;
    let allowed = matches!(findings.joint.require.allow, Allow::Plastic { .. });
    (allowed && plastic.tightest.regime != Regime::Elastic).then_some((&plastic.loosest, &plastic.tightest))
}

/// The walls side by side, each at least a good quarter of the width; the radius is stretched to fit.
pub(super) struct Walls {
    radii: Vec<f64>,
    places: Vec<f64>,
    stretched: bool,
}

impl Walls {
    pub(super) fn new(sizes: &[(f64, f64)]) -> Self {
        let mut radii: Vec<f64> = sizes.iter().map(|(_, outer)| *outer).collect();
        radii.insert(0, sizes.first().map_or(0.0, |(inner, _)| *inner));
        let span = radii[radii.len() - 1] - radii[0];
        let least = LEAST_SHARE.min(0.8 / sizes.len().max(1) as f64);
        let shares: Vec<f64> = radii.windows(2).map(|pair| ((pair[1] - pair[0]) / span).max(least)).collect();
        let sum: f64 = shares.iter().sum();
        let mut place = 0.0;
        let mut places = vec![0.0];
        for share in &shares {
            place += share / sum;
            places.push(place);
        }
        Self { radii, places, stretched: (sum - 1.0).abs() > 1e-9 }
    }

    pub(super) fn ends(&self, ring: usize) -> (f64, f64) {
        (self.places[ring], self.places[ring + 1])
    }

    /// Place of a radius within a ring.
    pub(super) fn place(&self, ring: usize, radius: f64) -> f64 {
        let (from, to) = self.ends(ring);
        from + (to - from) * (radius - self.radii[ring]) / (self.radii[ring + 1] - self.radii[ring])
    }

    pub(super) fn axis(&self, units: Units) -> Axis {
        let ticks = self
            .radii
            .iter()
            .zip(&self.places)
            .map(|(radius, place)| (*place, units.reading(Measure::Size, *radius).number))
            .collect();
        let note = if self.stretched { "; walls not to scale" } else { "" };
        Axis { from: 0.0, to: 1.0, ticks, title: format!("radius, {}{note}", units.unit(Measure::Size)) }
    }
}

/// Stress through one wall from the pressures on its faces; a uniform temperature stresses no free ring.
fn profile(ring: &Ring, size: (f64, f64), stress: &RingStress, criterion: DuctileCriterion) -> Profile {
    let material = &ring.material;
    let load = RingLoad {
        inner_pressure: if size.0 > 0.0 { -stress.bore.radial } else { 0.0 },
        outer_pressure: -stress.rim.radial,
        ..RingLoad::default()
    };
    let (modulus, poisson) = (material.youngs_modulus.value, material.poisson.value);
    let Ok(section) = RingSection::new(size.0, size.1, modulus, poisson, material.density.value) else {
        return Profile::default();
    };
    let measure = |stress: Stress| match (material.kind, criterion) {
        (Kind::Brittle, _) => criteria::greatest_principal(stress.radial, stress.hoop),
        (_, DuctileCriterion::VonMises) => criteria::von_mises(stress.radial, stress.hoop),
        (_, DuctileCriterion::Tresca) => criteria::tresca(stress.radial, stress.hoop),
    };
    sampled(size, |radius| section.stress_at(&load, radius).ok(), measure)
}

/// Stress through a hub that has yielded, with the equivalent of its yield rule: it stays at yield in the plastic zone.
fn plastic_profile(size: (f64, f64), state: &PlasticState) -> Profile {
    let measure = |stress: Stress| match state.rule {
        YieldRule::Tresca => criteria::tresca(stress.radial, stress.hoop),
        YieldRule::ModifiedTresca => 0.75f64.sqrt() * criteria::tresca(stress.radial, stress.hoop),
        YieldRule::VonMises => criteria::von_mises(stress.radial, stress.hoop),
    };
    sampled(size, |radius| state.stress_at(radius).ok(), measure)
}

fn sampled(
    (inner, outer): (f64, f64),
    stress_at: impl Fn(f64) -> Option<Stress>,
    equivalent: impl Fn(Stress) -> f64,
) -> Profile {
    let mut profile = Profile::default();
    for step in 0..POINTS {
        let radius = inner + (outer - inner) * step as f64 / (POINTS - 1) as f64;
        let Some(stress) = stress_at(radius) else { continue };
        profile.hoop.push((radius, stress.hoop));
        profile.radial.push((radius, stress.radial));
        profile.equivalent.push((radius, equivalent(stress)));
    }
    profile
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::report::sample;

    /// The profile is computed from the pressures, the faces by the findings: both must meet at the faces.
    #[test]
    fn the_curves_end_at_the_stresses_of_the_faces() {
        let joints = [sample::hollow_shaft(), sample::fan_hub(), sample::three_rings(), sample::stepped()];
        for findings in joints {
            let cut = Cut::new(&findings);
            let (_, tightest) = cut.profiles(&findings);
            assert_eq!(tightest.len(), findings.joint.rings.len());
            for (profile, ring) in tightest.iter().zip(&cut.tightest) {
                let close = |a: f64, b: f64| assert!((a - b).abs() < 1.0, "{a} and {b} Pa");
                close(profile.hoop[0].1, ring.bore.hoop);
                close(profile.radial[0].1, ring.bore.radial);
                close(profile.hoop[POINTS - 1].1, ring.rim.hoop);
                close(profile.radial[POINTS - 1].1, ring.rim.radial);
                let greatest = profile.equivalent.iter().map(|point| point.1).fold(0.0, f64::max);
                close(greatest, ring.equivalent);
            }
        }
    }

    /// In the plastic zone the equivalent stress is the yield strength, beyond it less.
    #[test]
    fn a_hub_that_yields_by_design_stays_at_its_yield_strength() {
        let findings = sample::plastic_hub();
        let (_, tightest) = Cut::new(&findings).profiles(&findings);
        let (_, state) = plastic(&findings).unwrap();
        let strength = findings.joint.rings[1].strength.yield_strength.unwrap();
        for (radius, equivalent) in &tightest[1].equivalent {
            if *radius <= state.plastic_diameter / 2.0 {
                assert!((equivalent - strength).abs() < 1e-6 * strength, "{radius}: {equivalent}");
            } else {
                assert!(*equivalent < strength);
            }
        }
        assert!((tightest[1].radial[0].1 + state.pressure).abs() < 1.0);
        assert!(plastic(&sample::yielding()).is_none());
    }

    #[test]
    fn a_thin_wall_is_given_room_and_the_axis_says_so() {
        let walls = Walls::new(&Cut::new(&sample::thin_bush()).sizes);
        let (from, to) = walls.ends(0);
        assert!(to - from > 0.2 && walls.stretched);
        assert!((walls.place(1, 0.055) - 1.0).abs() < 1e-12);
        assert!(!Walls::new(&Cut::new(&sample::fan_hub()).sizes).stretched);
    }
}
