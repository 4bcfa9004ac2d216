//! Outline of a stepped hub and shaft along the joint, on paper.

use super::scale::Layout;
use crate::joint::Joint;

/// A piece of the joint of one section, mm on paper.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Segment {
    pub left: f64,
    pub right: f64,
    /// Radius of the hub.
    pub rim: f64,
    /// Radius of the shaft's bore, zero when solid.
    pub bore: f64,
    /// True sizes, m.
    pub length: f64,
    pub outer_diameter: f64,
    pub bore_diameter: f64,
}

/// Face radii of the rings, m: the least bore and the greatest hub where they are stepped.
pub(super) fn radii(joint: &Joint) -> Vec<f64> {
    let slices = &joint.slices;
    let bore = slices.iter().map(|slice| slice.shaft_bore).fold(f64::INFINITY, f64::min);
    let rim = slices.iter().map(|slice| slice.hub_outer_diameter).fold(0.0, f64::max);
    let first = joint.rings.first().map_or(0.0, |ring| ring.inner_diameter);
    let mut radii = vec![if bore.is_finite() { bore } else { first } / 2.0];
    radii.extend(joint.rings.iter().map(|ring| ring.outer_diameter / 2.0));
    if let Some(last) = radii.last_mut().filter(|_| rim > 0.0) {
        *last = rim / 2.0;
    }
    radii
}

/// The pieces from left to right; one when nothing is stepped.
pub(super) fn segments(joint: &Joint, layout: &Layout, hub_left: f64) -> Vec<Segment> {
    let (inner, outer) = (joint.rings.first(), joint.rings.last());
    let whole = (
        joint.length,
        outer.map_or(0.0, |ring| ring.outer_diameter),
        inner.map_or(0.0, |ring| ring.inner_diameter),
    );
    let mut sizes: Vec<(f64, f64, f64)> =
        joint.slices.iter().map(|slice| (slice.length, slice.hub_outer_diameter, slice.shaft_bore)).collect();
    if sizes.is_empty() {
        sizes.push(whole);
    }
    let total: f64 = sizes.iter().map(|size| size.0).sum();
    let mut left = hub_left;
    sizes
        .into_iter()
        .map(|(length, outer_diameter, bore_diameter)| {
            let right = left + layout.axial.to * length / total;
            let segment = Segment {
                left,
                right,
                rim: layout.paper(outer_diameter / 2.0),
                bore: layout.paper(bore_diameter / 2.0),
                length,
                outer_diameter,
                bore_diameter,
            };
            left = right;
            segment
        })
        .collect()
}

/// A diameter that is dimensioned once, with the end of the extension line and the side it goes to.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Dimensioned {
    pub diameter: f64,
    pub radius: f64,
    pub from: f64,
    pub to_the_right: bool,
}

/// The different bores of the shaft: each is dimensioned on the side where it comes out.
pub(super) fn bores(segments: &[Segment], shaft: (f64, f64)) -> Vec<Dimensioned> {
    let mut found: Vec<Dimensioned> = Vec::new();
    for (place, segment) in segments.iter().enumerate() {
        let known = found.iter().any(|one| one.diameter == segment.bore_diameter);
        if segment.bore_diameter <= 0.0 || known {
            continue;
        }
        let runs_right = segments[place..].iter().all(|other| other.bore_diameter >= segment.bore_diameter);
        let from = if runs_right { shaft.1 } else { shaft.0 };
        let (diameter, radius) = (segment.bore_diameter, segment.bore);
        found.push(Dimensioned { diameter, radius, from, to_the_right: runs_right });
    }
    found
}

/// The different outer diameters of the hub, each on a side where no larger piece is in the way.
pub(super) fn rims(segments: &[Segment]) -> Vec<Dimensioned> {
    let mut found: Vec<Dimensioned> = Vec::new();
    for (place, segment) in segments.iter().enumerate() {
        if found.iter().any(|one| one.diameter == segment.outer_diameter) {
            continue;
        }
        let free = |others: &[Segment]| others.iter().all(|other| other.rim <= segment.rim);
        let last = segments.iter().rposition(|other| other.outer_diameter == segment.outer_diameter);
        let last = last.unwrap_or(place);
        let right = free(&segments[last + 1..]) || !free(&segments[..place]);
        let from = if right { segments[last].right } else { segment.left };
        found.push(Dimensioned {
            diameter: segment.outer_diameter,
            radius: segment.rim,
            from,
            to_the_right: right,
        });
    }
    found
}

#[cfg(test)]
mod tests {
    use super::*;

    fn piece(left: f64, right: f64, outer: f64, bore: f64) -> Segment {
        Segment {
            left,
            right,
            rim: outer / 2.0,
            bore: bore / 2.0,
            length: right - left,
            outer_diameter: outer,
            bore_diameter: bore,
        }
    }

    #[test]
    fn a_smaller_piece_is_dimensioned_where_no_larger_one_is_in_the_way() {
        let rims = rims(&[piece(0.0, 10.0, 20.0, 0.0), piece(10.0, 20.0, 30.0, 0.0)]);
        assert_eq!(rims.iter().map(|one| one.to_the_right).collect::<Vec<_>>(), [false, true]);
        assert_eq!(rims[0].from, 0.0);
        let twice = super::rims(&[piece(0.0, 5.0, 20.0, 0.0), piece(5.0, 9.0, 20.0, 8.0)]);
        assert_eq!((twice.len(), twice[0].from), (1, 9.0));
    }

    #[test]
    fn a_bore_is_dimensioned_at_the_end_where_it_comes_out() {
        let bores = bores(&[piece(0.0, 5.0, 20.0, 0.0), piece(5.0, 9.0, 20.0, 8.0)], (-14.0, 23.0));
        assert_eq!((bores.len(), bores[0].from, bores[0].to_the_right), (1, 23.0, true));
        let left = super::bores(&[piece(0.0, 5.0, 20.0, 8.0), piece(5.0, 9.0, 20.0, 0.0)], (-14.0, 23.0));
        assert_eq!((left[0].from, left[0].to_the_right), (-14.0, false));
    }
}
