//! The cut faces on paper: where each ring lies, its hatching, outlines, breaks and the interference.

use super::profile::Segment;
use super::scale::Layout;
use crate::report::hatch::{Rectangle, hatching_of, lines};
use crate::report::svg::{INK, Pen, Point, RULE, Sketch, TIGHTEST, chain, closed};

/// Wide and narrow lines of a drawing, mm (ISO 128-2:2020, line group 0.5).
pub(super) const WIDE: Pen = Pen::solid(INK, 0.5);
pub(super) const NARROW: Pen = Pen::solid(INK, 0.18);
const HATCH: Pen = Pen::solid(RULE, 0.18);
const CENTRE: Pen = Pen::dashed(INK, 0.18, "7 1.2 0.6 1.2");

/// Length of shaft shown on either side of the hub, mm.
pub(super) const STUB: f64 = 14.0;
/// Width of the gap where a stretch is broken out, mm.
const GAP: f64 = 2.4;
/// Height of the interference on paper, mm, before it is rounded to a whole factor.
const BAND: f64 = 0.9;

/// Places on the sheet, mm.
#[derive(Debug, Clone, Copy)]
pub(super) struct Place {
    pub hub_left: f64,
    pub hub_right: f64,
    /// Height of the centre line.
    pub centre: f64,
    /// Relief on paper at the right end of the bore.
    pub relief: f64,
}

impl Place {
    pub(super) fn shaft_left(self) -> f64 {
        self.hub_left - STUB
    }

    pub(super) fn shaft_right(self) -> f64 {
        self.hub_right + STUB
    }
}

/// The interference at one mating surface on paper.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Band {
    /// Height on paper, mm; negative is a gap.
    pub height: f64,
}

/// How many times too large the interferences are drawn, and the height of each.
///
/// The factor is 1, 2 or 5 times a power of ten, so that the largest comes out near [`BAND`].
pub(super) fn bands(radial: &[f64], scale: f64) -> (f64, Vec<Band>) {
    let largest = radial.iter().map(|value| (value * 1e3 * scale).abs()).fold(0.0, f64::max);
    if largest <= 0.0 {
        return (1.0, vec![Band { height: 0.0 }; radial.len()]);
    }
    let wanted = BAND / largest;
    let decade = 10f64.powf(wanted.log10().floor());
    let step = [5.0, 2.0, 1.0].into_iter().find(|step| step * decade <= wanted * 1.3).unwrap_or(1.0);
    let factor = (step * decade).max(1.0);
    (factor, radial.iter().map(|value| Band { height: value * 1e3 * scale * factor }).collect())
}

/// Draws the cut faces.
pub(super) fn draw(sketch: &mut Sketch, layout: &Layout, place: Place, segments: &[Segment], bands: &[Band]) {
    let section = Section { layout, place, segments };
    for ring in 0..section.rings() {
        sketch.path(&lines(&section.faces(ring), hatching_of(ring)), HATCH);
    }
    for ring in 0..section.rings() {
        section.outline(sketch, ring);
    }
    for (ring, band) in bands.iter().enumerate() {
        interference(sketch, layout, place, ring, *band);
    }
    breaks(sketch, layout, place, segments);
    sketch.line((place.shaft_left() - 4.0, place.centre), (place.shaft_right() + 4.0, place.centre), CENTRE);
}

/// Left and right end of a ring; the innermost runs through.
fn ends(place: Place, ring: usize) -> (f64, f64) {
    if ring == 0 { (place.shaft_left(), place.shaft_right()) } else { (place.hub_left, place.hub_right) }
}

/// Depth of the relief in the bore of the second ring, mm.
fn relief_depth(layout: &Layout) -> f64 {
    layout.radial.get(2).map_or(0.0, |wall| (0.3 * (wall.to - wall.from)).min(1.4))
}

/// What is cut, with where it lies.
struct Section<'a> {
    layout: &'a Layout,
    place: Place,
    segments: &'a [Segment],
}

impl Section<'_> {
    fn rings(&self) -> usize {
        self.layout.radial.len() - 1
    }

    /// Bore of the shaft along its whole length: from, to, radius.
    fn bores(&self) -> Vec<(f64, f64, f64)> {
        let mut bores: Vec<(f64, f64, f64)> =
            self.segments.iter().map(|segment| (segment.left, segment.right, segment.bore)).collect();
        if let Some(first) = bores.first_mut() {
            first.0 = self.place.shaft_left();
        }
        if let Some(last) = bores.last_mut() {
            last.1 = self.place.shaft_right();
        }
        bores
    }

    /// The upper cut faces of a ring: left, right, inner and outer radius.
    fn walls(&self, ring: usize) -> Vec<(f64, f64, f64, f64)> {
        let wall = self.layout.radial[ring + 1];
        if ring == 0 {
            return self
                .bores()
                .into_iter()
                .map(|(left, right, bore)| (left, right, bore, wall.to))
                .collect();
        }
        let outermost = ring + 1 == self.rings();
        let mut walls = Vec::new();
        for segment in self.segments {
            let outer = if outermost { segment.rim } else { wall.to };
            let relief_from = self.place.hub_right - self.place.relief;
            if ring == 1 && self.place.relief > 0.0 && segment.right > relief_from {
                let from = relief_from.max(segment.left);
                if from > segment.left {
                    walls.push((segment.left, from, wall.from, outer));
                }
                walls.push((from, segment.right, wall.from + relief_depth(self.layout), outer));
            } else {
                walls.push((segment.left, segment.right, wall.from, outer));
            }
        }
        walls
    }

    /// The hatched rectangles of a ring, upper half and lower half.
    fn faces(&self, ring: usize) -> Vec<Rectangle> {
        let centre = self.place.centre;
        let of = |(left, right, inner, outer): (f64, f64, f64, f64)| {
            [
                Rectangle { left, right, top: centre - outer, bottom: centre - inner },
                Rectangle { left, right, top: centre + inner, bottom: centre + outer },
            ]
        };
        self.walls(ring).into_iter().flat_map(of).collect()
    }

    /// Outline of a ring in both halves.
    fn outline(&self, sketch: &mut Sketch, ring: usize) {
        let walls = self.walls(ring);
        for side in [-1.0, 1.0] {
            let y = |radius: f64| self.place.centre + side * radius;
            let outer: Vec<Point> = walls
                .iter()
                .flat_map(|(left, right, _, outer)| [(*left, y(*outer)), (*right, y(*outer))])
                .collect();
            let inner =
                walls.iter().flat_map(|(left, right, inner, _)| [(*left, y(*inner)), (*right, y(*inner))]);
            if ring == 0 {
                sketch.path(&chain(&outer), WIDE);
                self.bore_line(sketch, side);
                continue;
            }
            let mut corners = outer;
            let inner: Vec<Point> = inner.collect();
            corners.extend(inner.into_iter().rev());
            sketch.path(&closed(&corners), WIDE);
        }
    }

    /// The bore of the shaft; where it is solid there is no line.
    fn bore_line(&self, sketch: &mut Sketch, side: f64) {
        let bores = self.bores();
        let y = |radius: f64| self.place.centre + side * radius;
        for (place, (left, right, bore)) in bores.iter().enumerate() {
            if *bore > 0.0 {
                sketch.line((*left, y(*bore)), (*right, y(*bore)), WIDE);
            }
            if let Some((_, _, next)) = bores.get(place + 1).filter(|(_, _, next)| next != bore) {
                sketch.line((*right, y(*bore)), (*right, y(*next)), WIDE);
            }
        }
    }
}

/// The overlap of both parts, or the gap between them, at the face outside of ring `ring`.
fn interference(sketch: &mut Sketch, layout: &Layout, place: Place, ring: usize, band: Band) {
    let radius = layout.radial[ring + 1].to;
    let right = place.hub_right - if ring == 0 { place.relief } else { 0.0 };
    for side in [-1.0, 1.0] {
        let at = |r: f64| place.centre + side * r;
        let corners = [
            (place.hub_left, at(radius)),
            (right, at(radius)),
            (right, at(radius + band.height.abs())),
            (place.hub_left, at(radius + band.height.abs())),
        ];
        sketch.area(&closed(&corners), if band.height > 0.0 { TIGHTEST } else { "#ffffff" });
        let edge = chain(&[corners[3], corners[2]]);
        sketch.path(&edge, Pen::solid(if band.height > 0.0 { TIGHTEST } else { INK }, 0.18));
    }
}

/// Break lines: the ends of the shaft and whatever is broken out.
fn breaks(sketch: &mut Sketch, layout: &Layout, place: Place, segments: &[Segment]) {
    let shaft = layout.radial[1].to;
    for (ring, wall) in layout.radial.iter().enumerate() {
        if wall.broken {
            let (left, right) = ends(place, ring.saturating_sub(1));
            for side in [-1.0, 1.0] {
                gap(sketch, place.centre + side * wall.middle(), (left - 1.0, right + 1.0), true);
            }
        }
    }
    let spans = |bore: f64, outer: f64| -> Vec<(f64, f64)> {
        if bore > 0.0 {
            vec![(place.centre - outer, place.centre - bore), (place.centre + bore, place.centre + outer)]
        } else {
            vec![(place.centre - outer, place.centre + outer)]
        }
    };
    let bore = |segment: Option<&Segment>| segment.map_or(0.0, |segment| segment.bore);
    for (x, outside, bore) in [
        (place.shaft_left(), -2.0, bore(segments.first())),
        (place.shaft_right(), 2.0, bore(segments.last())),
    ] {
        for span in spans(bore, shaft) {
            let wave = wave(span, x, false);
            let mut blank = wave.clone();
            blank.extend([(x + outside, span.1), (x + outside, span.0)]);
            sketch.area(&closed(&blank), "#ffffff");
            sketch.path(&chain(&wave), NARROW);
        }
    }
    if layout.axial.broken {
        // Through the longest piece, where most is left out.
        let longest = segments.iter().max_by(|a, b| (a.right - a.left).total_cmp(&(b.right - b.left)));
        if let Some(segment) = longest {
            for (from, to) in spans(segment.bore, segment.rim) {
                gap(sketch, 0.5 * (segment.left + segment.right), (from - 0.6, to + 0.6), false);
            }
        }
    }
}

/// A white gap with a wavy line on either side: across `at`, running from and to.
fn gap(sketch: &mut Sketch, at: f64, span: (f64, f64), horizontal: bool) {
    let first = wave(span, at - GAP / 2.0, horizontal);
    let second = wave(span, at + GAP / 2.0, horizontal);
    let mut area = first.clone();
    area.extend(second.iter().rev());
    sketch.area(&closed(&area), "#ffffff");
    sketch.path(&chain(&first), NARROW);
    sketch.path(&chain(&second), NARROW);
}

/// A wavy line along a span.
fn wave((from, to): (f64, f64), at: f64, horizontal: bool) -> Vec<Point> {
    let steps = (((to - from) / 0.6).ceil() as usize).clamp(4, 400);
    (0..=steps)
        .map(|step| {
            let along = from + (to - from) * step as f64 / steps as f64;
            let across = at + 0.45 * (std::f64::consts::TAU * (along - from) / 7.0).sin();
            if horizontal { (along, across) } else { (across, along) }
        })
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_interference_is_exaggerated_by_a_round_factor() {
        // 36 µm radial at 1 : 2 is 0.018 mm on paper; 50 times that is 0.9 mm.
        let (factor, bands) = bands(&[36e-6], 0.5);
        assert_eq!(factor, 50.0);
        approx::assert_relative_eq!(bands[0].height, 0.9, epsilon = 1e-12);
        let (factor, bands) = super::bands(&[0.0], 0.5);
        assert_eq!((factor, bands[0].height), (1.0, 0.0));
    }

    #[test]
    fn the_band_never_swallows_the_wall() {
        for exponent in -9..-2 {
            let (_, bands) = bands(&[3.3 * 10f64.powi(exponent)], 0.1);
            assert!(bands[0].height <= BAND * 1.4, "{bands:?}");
        }
    }
}
