//! Lettering beside curves and marks, placed so that no two touch and none leaves the figure.

use crate::report::svg::{Anchor, Lettering, Pen, Point, QUIET, Sketch};

/// An upright box, px.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Box {
    pub left: f64,
    pub top: f64,
    pub right: f64,
    pub bottom: f64,
}

impl Box {
    fn overlaps(&self, other: &Box) -> bool {
        self.left < other.right
            && other.left < self.right
            && self.top < other.bottom
            && other.top < self.bottom
    }

    fn holds(&self, inner: &Box) -> bool {
        inner.left >= self.left
            && inner.right <= self.right
            && inner.top >= self.top
            && inner.bottom <= self.bottom
    }

    fn contains(&self, (x, y): Point) -> bool {
        x > self.left && x < self.right && y > self.top && y < self.bottom
    }

    fn grown(&self, by: f64) -> Box {
        Box { left: self.left - by, top: self.top - by, right: self.right + by, bottom: self.bottom + by }
    }

    /// The point of the box nearest to `point`.
    fn nearest(&self, (x, y): Point) -> Point {
        (x.clamp(self.left, self.right), y.clamp(self.top, self.bottom))
    }
}

/// Side on which a tag is tried first.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Side {
    Right,
    Left,
    Above,
    Below,
}

/// Lettering that belongs to a point.
#[derive(Debug, Clone)]
pub(super) struct Tag {
    pub at: Point,
    pub lettering: Lettering,
    pub side: Side,
    /// Where it goes when there is no room straight beside the point.
    pub lean: Lean,
}

/// Direction in which a tag gives way.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Lean {
    Either,
    Up,
    Down,
}

/// Air between a tag and its point, px.
const AIR: f64 = 6.0;
/// Beyond this distance a thin line leads from tag to point, px.
const NEAR: f64 = 15.0;

/// What it costs to go to the next side, in px of distance.
const OTHER_SIDE: f64 = 14.0;

/// Places the tags one after the other and draws them.
pub(super) struct Placer {
    frame: Box,
    taken: Vec<Box>,
    /// Points along everything that is drawn, at most a few px apart.
    ink: Vec<Point>,
}

impl Placer {
    pub(super) fn new(frame: Box, taken: Vec<Box>, ink: Vec<Point>) -> Self {
        Self { frame, taken, ink }
    }

    /// Places one tag where it covers least, and draws it.
    pub(super) fn place(&mut self, sketch: &mut Sketch, tag: &Tag) {
        let (width, height) = (tag.lettering.width(), tag.lettering.size * 1.15);
        let near = candidates(tag, width, height);
        let best = self.best(tag, &near).or_else(|| self.best(tag, &self.anywhere(width, height)));
        let Some(chosen) = best else { return };
        let end = chosen.nearest(tag.at);
        if (end.0 - tag.at.0).hypot(end.1 - tag.at.1) > NEAR {
            sketch.line(tag.at, end, Pen::solid(QUIET, 0.6));
        }
        let baseline = chosen.bottom - 0.25 * height;
        sketch.text((chosen.left, baseline), &tag.lettering.clone().anchor(Anchor::Start).halo());
        self.taken.push(chosen);
    }

    fn best(&self, tag: &Tag, candidates: &[(Box, f64)]) -> Option<Box> {
        let mut best: Option<(f64, Box)> = None;
        for (candidate, price) in candidates {
            if !self.frame.holds(candidate) || self.taken.iter().any(|taken| taken.overlaps(candidate)) {
                continue;
            }
            let tight = candidate.grown(1.0);
            let covered = self.ink.iter().filter(|point| tight.contains(**point)).count();
            let end = candidate.nearest(tag.at);
            let distance = (end.0 - tag.at.0).hypot(end.1 - tag.at.1);
            let cost =
                1.6 * covered.min(20) as f64 + distance.max(AIR) + 2.0 * (AIR - distance).max(0.0) + price;
            if best.is_none_or(|(least, _)| cost < least) {
                best = Some((cost, *candidate));
            }
        }
        best.map(|(_, candidate)| candidate)
    }

    /// A grid over the whole figure, for when there is no room near by.
    fn anywhere(&self, width: f64, height: f64) -> Vec<(Box, f64)> {
        let rows = ((self.frame.bottom - self.frame.top) / height) as usize;
        let columns = ((self.frame.right - self.frame.left) / 12.0) as usize;
        let mut all = Vec::with_capacity(rows * columns);
        for row in 0..rows {
            for column in 0..columns {
                let left = self.frame.left + 12.0 * column as f64;
                let top = self.frame.top + height * row as f64;
                all.push((Box { left, top, right: left + width, bottom: top + height }, 0.0));
            }
        }
        all
    }
}

/// Boxes round the point, the preferred side first, with what choosing each costs.
fn candidates(tag: &Tag, width: f64, height: f64) -> Vec<(Box, f64)> {
    let sides = match tag.side {
        Side::Right => [Side::Right, Side::Above, Side::Below, Side::Left],
        Side::Left => [Side::Left, Side::Above, Side::Below, Side::Right],
        Side::Above => [Side::Above, Side::Below, Side::Right, Side::Left],
        Side::Below => [Side::Below, Side::Above, Side::Right, Side::Left],
    };
    let (x, y) = tag.at;
    let mut all = Vec::new();
    for (turn, side) in sides.into_iter().enumerate() {
        for shift in [0.0, -1.0, 1.0, -2.0, 2.0, -3.0, 3.0] {
            for slide in [0.0, -0.5, 0.5] {
                let (left, top) = match side {
                    Side::Right => {
                        (x + AIR + 16.0 * (slide + 0.5) - 8.0, y - height / 2.0 + shift * height * 0.7)
                    }
                    Side::Left => (
                        x - AIR - width - 16.0 * (slide + 0.5) + 8.0,
                        y - height / 2.0 + shift * height * 0.7,
                    ),
                    Side::Above => {
                        (x - width / 2.0 + slide * width, y - AIR + 1.0 - height - shift.abs() * height * 0.5)
                    }
                    Side::Below => {
                        (x - width / 2.0 + slide * width, y + AIR - 1.0 + shift.abs() * height * 0.5)
                    }
                };
                let place = Box { left, top, right: left + width, bottom: top + height };
                let against = match tag.lean {
                    Lean::Up => shift > 0.0,
                    Lean::Down => shift < 0.0,
                    Lean::Either => false,
                };
                all.push((place, OTHER_SIDE * (turn as f64 + f64::from(u8::from(against)))));
            }
        }
    }
    all
}

/// Points along a chain of lines, at most `step` px apart.
pub(super) fn along(points: &[Point], step: f64) -> Vec<Point> {
    let mut all = Vec::new();
    for pair in points.windows(2) {
        let ((x0, y0), (x1, y1)) = (pair[0], pair[1]);
        let count = ((x1 - x0).hypot(y1 - y0) / step).ceil().clamp(1.0, 2000.0) as usize;
        all.extend((0..count).map(|i| {
            let t = i as f64 / count as f64;
            (x0 + t * (x1 - x0), y0 + t * (y1 - y0))
        }));
    }
    all.extend(points.last());
    all
}

#[cfg(test)]
mod tests {
    use super::*;

    fn frame() -> Box {
        Box { left: 0.0, top: 0.0, right: 300.0, bottom: 200.0 }
    }

    fn tag(text: &str, at: Point) -> Tag {
        Tag { at, lettering: Lettering::new(text, 12.0), side: Side::Right, lean: Lean::Either }
    }

    #[test]
    fn twenty_tags_at_one_point_do_not_touch() {
        let mut placer = Placer::new(frame(), vec![], vec![]);
        let mut sketch = Sketch::default();
        for number in 0..20 {
            placer.place(&mut sketch, &tag(&format!("label {number}"), (150.0, 100.0)));
        }
        assert_eq!(placer.taken.len(), 20);
        for (i, one) in placer.taken.iter().enumerate() {
            assert!(frame().holds(one));
            assert!(placer.taken.iter().skip(i + 1).all(|other| !one.overlaps(other)));
        }
    }

    #[test]
    fn a_tag_gives_way_in_the_direction_asked_for() {
        for (lean, above) in [(Lean::Up, true), (Lean::Down, false)] {
            let taken = Box { left: 100.0, top: 90.0, right: 300.0, bottom: 110.0 };
            let mut placer = Placer::new(frame(), vec![taken], vec![]);
            placer.place(&mut Sketch::default(), &Tag { lean, ..tag("curve", (100.0, 100.0)) });
            assert_eq!(placer.taken[1].bottom <= 90.0, above, "{lean:?}");
        }
    }

    #[test]
    fn a_tag_at_the_edge_goes_inside() {
        let mut placer = Placer::new(frame(), vec![], vec![]);
        placer.place(&mut Sketch::default(), &tag("at the corner", (299.0, 1.0)));
        assert!(placer.taken[0].right <= 300.0 && placer.taken[0].top >= 0.0);
    }

    #[test]
    fn a_tag_keeps_off_the_curve_when_it_can() {
        let curve = along(&[(0.0, 100.0), (300.0, 100.0)], 3.0);
        let mut placer = Placer::new(frame(), vec![], curve.clone());
        placer.place(&mut Sketch::default(), &tag("curve", (100.0, 100.0)));
        assert!(curve.iter().all(|point| !placer.taken[0].contains(*point)));
    }
}
