//! Dimension lines with arrows and figures (ISO 129-1:2018).

use super::section::NARROW;
use crate::report::svg::{Anchor, INK, Lettering, Point, QUIET, Sketch, closed};
use crate::report::text_width::fitted;

/// Type size of figures, mm: capitals of 2.5 mm (ISO 3098-1:2015).
pub(super) const TYPE: f64 = 3.4;
/// Type size of notes beside a dimension, mm.
const SMALL: f64 = 2.4;
const ARROW: f64 = 2.6;
/// Extension lines begin this far from the outline and end this far beyond the dimension line, mm.
const CLEAR: f64 = 0.8;
const BEYOND: f64 = 1.6;
/// Longest figure, mm.
const LONGEST: f64 = 76.0;

/// A diameter dimension standing beside the part.
pub(super) struct Diameter {
    /// Where its extension lines begin.
    pub from: f64,
    /// Where the dimension line stands.
    pub at: f64,
    /// Radius on paper.
    pub radius: f64,
    pub text: String,
    /// Small lettering on the other side of the line, where it has room.
    note: Option<Lettering>,
}

impl Diameter {
    pub(super) fn new(from: f64, at: f64, radius: f64, text: &str) -> Self {
        Self { from, at, radius, text: fitted(text, TYPE, LONGEST), note: None }
    }

    /// With a note, left out when it is longer than its line.
    pub(super) fn noted(mut self, note: Option<String>) -> Self {
        let note =
            note.map(|text| Lettering::new(text, SMALL).upright().colour(QUIET).anchor(Anchor::Middle));
        self.note = note.filter(|note| note.width() <= 2.0 * self.radius - 2.0 * ARROW);
        self
    }

    fn lettering(&self) -> Lettering {
        Lettering::new(&self.text, TYPE).upright()
    }

    /// Whether the figure has room beside its own line.
    fn has_room(&self) -> bool {
        self.lettering().width() <= 2.0 * self.radius - 1.0
    }

    /// How far the figure reaches below the part when it stands there, mm.
    pub(super) fn below(&self) -> f64 {
        if self.has_room() { 0.0 } else { 4.0 + self.lettering().width() }
    }

    /// Draws it about the centre line; `bottom` is the lowest edge of the part.
    pub(super) fn draw(&self, sketch: &mut Sketch, centre: f64, bottom: f64) {
        let outwards = (self.at - self.from).signum();
        for side in [-1.0, 1.0] {
            let y = centre + side * self.radius;
            sketch.line((self.from + outwards * CLEAR, y), (self.at + outwards * BEYOND, y), NARROW);
        }
        let (top, base) = ((self.at, centre - self.radius), (self.at, centre + self.radius));
        let inside = 2.0 * self.radius >= 3.0 * ARROW;
        arrows(sketch, top, base, inside);
        let baseline = self.at - 1.0;
        if self.has_room() {
            sketch.line(top, base, NARROW);
            sketch.text((baseline, centre), &self.lettering().anchor(Anchor::Middle));
            if let Some(note) = &self.note {
                sketch.text((self.at + 0.7 + 0.8 * SMALL, centre), note);
            }
        } else {
            sketch.line(top, (self.at, bottom + self.below()), NARROW);
            sketch.text((baseline, bottom + 4.0), &self.lettering().anchor(Anchor::End));
        }
    }
}

/// A length dimension below the part.
pub(super) struct Length {
    pub left: f64,
    pub right: f64,
    /// Height where its extension lines begin.
    pub from: f64,
    /// Height of the dimension line.
    pub at: f64,
    pub text: String,
    /// The figure stands to the right of the line instead of on it.
    pub beside: bool,
}

impl Length {
    /// From the end of the line to the figure beside it, at most, mm.
    pub(super) const BEFORE_TEXT: f64 = 2.0 * ARROW + 1.0;

    pub(super) fn lettering(&self) -> Lettering {
        Lettering::new(fitted(&self.text, TYPE, LONGEST), TYPE)
    }

    pub(super) fn draw(&self, sketch: &mut Sketch) {
        for x in [self.left, self.right] {
            sketch.line((x, self.from + CLEAR), (x, self.at + BEYOND), NARROW);
        }
        let (left, right) = ((self.left, self.at), (self.right, self.at));
        let inside = self.right - self.left >= 3.0 * ARROW;
        arrows(sketch, left, right, inside);
        sketch.line(left, right, NARROW);
        if self.beside {
            let end = self.right + if inside { 0.0 } else { 2.0 * ARROW };
            let width = self.lettering().width();
            sketch.line(right, (end + 1.0 + width, self.at), NARROW);
            sketch.text((end + 1.0, self.at - 1.0), &self.lettering());
        } else {
            let middle = 0.5 * (self.left + self.right);
            sketch.text((middle, self.at - 1.0), &self.lettering().anchor(Anchor::Middle));
        }
    }
}

/// Arrow heads at both ends, from inside or, when there is no room, from outside with a tail.
fn arrows(sketch: &mut Sketch, first: Point, second: Point, inside: bool) {
    let length = (second.0 - first.0).hypot(second.1 - first.1).max(1e-9);
    let along = ((second.0 - first.0) / length, (second.1 - first.1) / length);
    let sign = if inside { 1.0 } else { -1.0 };
    for (tip, direction) in [(first, sign), (second, -sign)] {
        let back = |distance: f64, across: f64| {
            (
                tip.0 + direction * distance * along.0 - across * along.1,
                tip.1 + direction * distance * along.1 + across * along.0,
            )
        };
        sketch.area(&closed(&[tip, back(ARROW, ARROW / 6.0), back(ARROW, -ARROW / 6.0)]), INK);
        if !inside {
            sketch.line(tip, back(2.0 * ARROW, 0.0), NARROW);
        }
    }
}
