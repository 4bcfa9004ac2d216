//! Names, materials and surfaces on leader lines above the section.

use super::dimension::TYPE;
use super::profile::Segment;
use super::scale::Layout;
use super::section::{Band, NARROW, Place};
use crate::joint::Joint;
use crate::report::svg::{INK, Lettering, Pen, Point, QUIET, Sketch, chain};
use crate::report::text_width::fitted;
use crate::report::typeset;
use crate::report::units::{Measure, Units};

/// Height of one row, mm.
const ROW: f64 = 5.6;
/// How far a leader leans to the right for each mm that it rises.
const LEAN: f64 = 0.18;

/// Level part of a leader before its lettering, and room for the surface sign, mm.
const SHOULDER: f64 = 2.6;
const SIGN: f64 = 9.0;

/// One row of lettering with what it points at.
#[derive(Debug, Clone)]
pub(super) struct Label {
    /// Ring that is meant, or none for the interference.
    ring: Option<usize>,
    name: String,
    text: String,
    surface: Option<String>,
}

/// The rows, uppermost first: each ring from the innermost, then the interference.
pub(super) fn rows(joint: &Joint, units: Units, factor: f64) -> Vec<Label> {
    let mut rows: Vec<Label> = joint
        .rings
        .iter()
        .enumerate()
        .map(|(index, ring)| Label {
            ring: Some(index),
            name: ring.name.clone(),
            text: ring.material.name.clone(),
            surface: Some(format!("Rz {}", units.text(Measure::Roughness, ring.roughness.value))),
        })
        .collect();
    let tightest: Vec<f64> = joint.fits.iter().map(|fit| fit.limits.interference().tightest).collect();
    let grips = tightest.iter().any(|value| *value >= 0.0);
    let sign = if grips { 1.0 } else { -1.0 };
    let tightest: Vec<String> =
        tightest.iter().map(|value| units.text(Measure::Deviation, sign * value)).collect();
    rows.push(Label {
        ring: None,
        name: if grips { "interference" } else { "clearance" }.to_owned(),
        text: format!("{}, drawn × {}", tightest.join(" and "), typeset::number(&format!("{factor}"))),
        surface: None,
    });
    rows
}

/// Height that the rows take above the section, mm.
pub(super) fn height(rows: usize) -> f64 {
    ROW * rows as f64
}

/// What the leaders point into.
#[derive(Clone, Copy)]
pub(super) struct Targets<'a> {
    pub layout: &'a Layout,
    pub place: Place,
    pub segments: &'a [Segment],
    pub bands: &'a [Band],
}

/// Draws rows and leaders; a leader further to the right belongs to a lower row, so that none is crossed.
pub(super) fn draw(sketch: &mut Sketch, rows: &[Label], targets: Targets, width: f64) {
    for (row, label) in rows.iter().enumerate() {
        let baseline = baseline(row);
        let target = targets.of(label, row, rows.len());
        let bend = (target.0 + LEAN * (target.1 - baseline), baseline - 0.35 * TYPE);
        let start = bend.0 + SHOULDER;
        sketch.path(&chain(&[target, bend, (start - 0.6, bend.1)]), NARROW);
        sketch.dot(target, 0.5, INK, Pen::solid("#ffffff", 0.2));
        lettering(sketch, label, (start, baseline), width - start - 1.0);
    }
}

/// How far to the right the rows reach when none is cut, mm.
pub(super) fn reach(rows: &[Label], targets: Targets) -> f64 {
    let end = |(row, label): (usize, &Label)| {
        let target = targets.of(label, row, rows.len());
        target.0 + LEAN * (target.1 - baseline(row)) + SHOULDER + label.width() + 1.5
    };
    rows.iter().enumerate().map(end).fold(0.0, f64::max)
}

fn baseline(row: usize) -> f64 {
    ROW * (row as f64 + 1.0) - 1.4
}

impl Label {
    fn surface(&self) -> Option<Lettering> {
        self.surface.as_ref().map(|text| Lettering::new(text, TYPE))
    }

    /// Width of the whole row when nothing is cut, mm.
    fn width(&self) -> f64 {
        let surface = self.surface().map_or(0.0, |text| text.width() + SIGN);
        let name = Lettering::new(&self.name, TYPE).bold().width();
        name + 1.6 + Lettering::new(&self.text, TYPE).width() + surface
    }
}

impl Targets<'_> {
    /// The point inside the part that the leader ends on.
    fn of(&self, label: &Label, row: usize, rows: usize) -> Point {
        let (layout, place) = (self.layout, self.place);
        let Some(ring) = label.ring else {
            let last = self.bands.len();
            let radius =
                layout.radial[last].to + 0.5 * self.bands.last().map_or(0.0, |band| band.height.abs());
            return (along(row, rows, place), place.centre - radius);
        };
        let x = if ring == 0 { place.hub_left - 5.0 } else { along(row, rows, place) };
        let wall = layout.radial[ring + 1];
        let (inner, outer) = self.wall_at(ring, x);
        // Beside the break and the centre line, where the part is hatched.
        let share = if wall.broken { 0.78 } else { 0.5 };
        let radius = inner + share * (outer - inner);
        let radius = if ring == 0 && inner == 0.0 { radius.max(0.6 * outer) } else { radius };
        (x, place.centre - radius)
    }

    /// Inner and outer radius of a ring at a place along the joint.
    fn wall_at(&self, ring: usize, x: f64) -> (f64, f64) {
        let wall = self.layout.radial[ring + 1];
        let segment = self.segments.iter().find(|segment| x <= segment.right).or(self.segments.last());
        let last = ring + 2 == self.layout.radial.len();
        let inner = if ring == 0 { segment.map_or(wall.from, |segment| segment.bore) } else { wall.from };
        let outer = if last { segment.map_or(wall.to, |segment| segment.rim) } else { wall.to };
        (inner, outer)
    }
}

/// Leaders that end within the hub stand at even distances along it.
fn along(row: usize, rows: usize, place: Place) -> f64 {
    // Along a wide hub they stay together, so that the lettering has room on the right.
    let width = (place.hub_right - place.hub_left - place.relief).min(13.0 * (rows as f64 - 1.0));
    place.hub_left + width * (row as f64 - 0.5) / (rows as f64 - 1.0)
}

fn lettering(sketch: &mut Sketch, label: &Label, at: Point, room: f64) {
    let surface = label.surface();
    let taken = surface.as_ref().map_or(0.0, |text| text.width() + SIGN);
    let name = Lettering::new(fitted(&label.name, TYPE, 0.4 * room), TYPE).bold();
    let after = at.0 + name.width() + 1.6;
    let text = Lettering::new(fitted(&label.text, TYPE, room - taken - name.width() - 1.6), TYPE);
    let text = if label.ring.is_none() { text.colour(QUIET) } else { text };
    let end = after + text.width();
    sketch.text(at, &name);
    sketch.text((after, at.1), &text);
    if let Some(surface) = surface {
        let x = end + 3.0;
        // The sign for a surface made by removing material (ISO 21920-1:2021).
        let sign = [
            (x, at.1 - 1.6),
            (x + 1.0, at.1),
            (x + 3.0, at.1 - 3.6),
            (x + 4.5 + surface.width(), at.1 - 3.6),
        ];
        sketch.path(&chain(&sign), Pen::solid(INK, 0.2));
        sketch.path(&chain(&[sign[0], (x + 1.9, at.1 - 1.6)]), Pen::solid(INK, 0.2));
        sketch.text((x + 3.6, at.1), &surface);
    }
}
