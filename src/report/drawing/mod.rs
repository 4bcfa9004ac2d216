//! The joint in section, to scale, with its dimensions, materials and surfaces.

mod dimension;
mod labels;
mod profile;
mod scale;
mod section;

use dimension::{Diameter, Length, TYPE};
use labels::Targets;
use maud::Markup;
use scale::layout;
use section::{Place, STUB, bands};

use super::svg::{Frame, Lettering, QUIET, Sketch};
use super::text_width::text_width;
use super::units::{Measure, Units};
use crate::findings::{Findings, PairFindings};
use crate::joint::Joint;
use crate::quantity::UnitSystem;

/// Width of the drawing, mm on paper.
const WIDTH: f64 = 170.0;
/// First dimension line beside the shaft, and distance from one to the next, mm.
const FIRST: f64 = 9.0;
const NEXT: f64 = 6.5;
/// Room for a note to the right of a dimension line, mm.
const NOTE: f64 = 3.2;

/// The section drawing with what its caption says.
pub struct SectionDrawing {
    /// The drawing as an `svg` element, as wide as the text of a page.
    pub svg: Markup,
    /// Scale, exaggeration and breaks in words.
    pub caption: String,
}

/// Draws the joint in axial section.
pub fn section(findings: &Findings) -> SectionDrawing {
    let joint = &findings.joint;
    let units = Units { system: joint.display };
    let radii = profile::radii(joint);
    let columns = columns(joint);
    let margin = |first: f64, next: f64, count: usize| first + next * (count.max(1) - 1) as f64 + 4.0;
    let left = margin(FIRST, NEXT, columns.0);
    let right = margin(first_right(joint, units), NEXT + NOTE, columns.1);
    let room = (WIDTH - 2.0 * STUB - left - right).min(84.0);
    let layout = layout(&radii, joint.length, room);

    let interference: Vec<f64> =
        joint.fits.iter().map(|fit| fit.limits.interference().tightest / 2.0).collect();
    let (factor, bands) = bands(&interference, layout.scale);
    let rows = labels::rows(joint, units, factor);
    let spare = WIDTH - left - right - 2.0 * STUB - layout.axial.to;
    let centre = labels::height(rows.len()) + 3.0 + layout.radial.last().map_or(0.0, |wall| wall.to);
    let place_at = |hub_left: f64| Place {
        hub_left,
        hub_right: hub_left + layout.axial.to,
        centre,
        relief: (joint.relief * 1e3 * layout.scale).min(0.4 * layout.axial.to),
    };
    // As near to the middle of the sheet as the lettering on its right allows.
    let reaches = |place: &Place| {
        let segments = profile::segments(joint, &layout, place.hub_left);
        labels::reach(&rows, Targets { layout: &layout, place: *place, segments: &segments, bands: &bands })
    };
    let place = [0.42, 0.3, 0.2, 0.1, 0.0]
        .map(|share| place_at(left + STUB + share * spare))
        .into_iter()
        .find(|place| reaches(place) <= WIDTH)
        .unwrap_or_else(|| place_at(left + STUB));
    let segments = profile::segments(joint, &layout, place.hub_left);
    let mut sketch = Sketch::default();
    section::draw(&mut sketch, &layout, place, &segments, &bands);
    let bottom = place.centre + layout.radial.last().map_or(0.0, |wall| wall.to);
    let below =
        Dimensions { findings, joint, units, layout: &layout, place, segments: &segments }.draw(&mut sketch);
    let targets = Targets { layout: &layout, place, segments: &segments, bands: &bands };
    labels::draw(&mut sketch, &rows, targets, WIDTH);
    let height = bottom + below + 7.0;
    let foot = Lettering::new(foot(&layout, units), TYPE).colour(QUIET);
    sketch.text((0.0, height - 1.0), &foot);

    let frame = Frame {
        id: "section-drawing".into(),
        class: "drawing",
        title: "Section of the joint".into(),
        description: description(joint, units),
        width: WIDTH,
        height,
        unit: "mm",
    };
    SectionDrawing { svg: sketch.finish(&frame), caption: caption(&layout, factor, &interference) }
}

/// How many dimension lines stand on the left and on the right.
fn columns(joint: &Joint) -> (usize, usize) {
    let pieces = profile::segments(joint, &layout(&profile::radii(joint), joint.length, 84.0), 0.0);
    let all = [profile::bores(&pieces, (0.0, 1.0)), profile::rims(&pieces)].concat();
    let right = all.iter().filter(|one| one.to_the_right).count();
    (joint.fits.len() + all.len() - right, right)
}

/// Everything that is dimensioned.
struct Dimensions<'a> {
    findings: &'a Findings,
    joint: &'a Joint,
    units: Units,
    layout: &'a scale::Layout,
    place: Place,
    segments: &'a [profile::Segment],
}

impl Dimensions<'_> {
    fn size(&self, value: f64) -> String {
        self.units.reading(Measure::Size, value).number
    }

    /// Draws all dimensions; returns how far they reach below the part, mm.
    fn draw(&self, sketch: &mut Sketch) -> f64 {
        let bottom = self.place.centre + self.layout.radial.last().map_or(0.0, |wall| wall.to);
        let mut below: f64 = 0.0;
        for diameter in self.diameters() {
            diameter.draw(sketch, self.place.centre, bottom);
            below = below.max(diameter.below());
        }
        below.max(self.lengths(sketch, bottom))
    }

    /// Smaller diameters stand nearer to the part, so that no extension line crosses a figure.
    fn diameters(&self) -> Vec<Diameter> {
        let place = self.place;
        let mut left: Vec<(f64, f64, String, Option<String>)> = Vec::new();
        let mut right: Vec<(f64, f64, String, Option<String>)> = Vec::new();
        for (k, fit) in self.joint.fits.iter().enumerate() {
            let from = if k == 0 { place.shaft_left() } else { place.hub_left };
            let text = dimension_text(&self.size(fit.limits.nominal), &fit.callout);
            left.push((self.layout.radial[k + 1].to, from, text, None));
        }
        let shaft = (place.shaft_left(), place.shaft_right());
        for one in [profile::bores(self.segments, shaft), profile::rims(self.segments)].concat() {
            let note = if one.to_the_right { self.assembled(one.diameter) } else { None };
            let side = if one.to_the_right { &mut right } else { &mut left };
            side.push((one.radius, one.from, format!("Ø{}", self.size(one.diameter)), note));
        }
        let first = (place.shaft_left() - FIRST, place.shaft_right() + first_right(self.joint, self.units));
        let mut all = Vec::new();
        for (mut side, first, step) in [(left, first.0, -NEXT), (right, first.1, NEXT + NOTE)] {
            side.sort_by(|a, b| a.0.total_cmp(&b.0));
            for (column, (radius, from, text, note)) in side.into_iter().enumerate() {
                all.push(Diameter::new(from, first + step * column as f64, radius, &text).noted(note));
            }
        }
        all
    }

    /// Size of the innermost bore or of the outer diameter of the assembled joint, loosest to tightest, as written;
    /// none of a stepped joint, whose size changes along it.
    fn assembled(&self, diameter: f64) -> Option<String> {
        let extremes = &self.findings.extremes;
        if extremes.tightest.pressure <= 0.0 || !self.joint.slices.is_empty() {
            return None;
        }
        let (shaft, hub) = self.joint.shaft_and_hub();
        let change: fn(&PairFindings) -> Option<f64> = if diameter == hub.outer_diameter {
            |pair| Some(pair.rings.last()?.outer_change)
        } else if diameter == shaft.inner_diameter {
            |pair| Some(pair.rings.first()?.bore_change)
        } else {
            return None;
        };
        let number = |pair| Some(self.size(diameter + change(pair)?));
        Some(format!("assembled {} to {}", number(&extremes.loosest)?, number(&extremes.tightest)?))
    }

    /// Draws the lengths of the pieces, of the relief and of the hub below the part; returns how far they reach, mm.
    fn lengths(&self, sketch: &mut Sketch, bottom: f64) -> f64 {
        let (joint, place) = (self.joint, self.place);
        let mut row = 7.5;
        let mut line = |left: f64, right: f64, row: f64, text: String, beside: bool| {
            Length { left, right, from: bottom, at: bottom + row, text, beside }.draw(sketch);
        };
        if self.segments.len() > 1 {
            for segment in self.segments {
                let text = self.size(segment.length);
                if text_width(&text, TYPE) <= segment.right - segment.left {
                    line(segment.left, segment.right, row, text, false);
                }
            }
            row += 7.0;
        }
        if joint.relief > 0.0 {
            let edge = place.hub_right - place.relief;
            line(place.hub_left, edge, row, self.size(joint.length - joint.relief), false);
            line(edge, place.hub_right, row, relief_text(joint, self.units), true);
            row += 7.0;
        }
        line(place.hub_left, place.hub_right, row, self.size(joint.length), false);
        row + 2.5
    }
}

/// Distance of the first dimension line on the right from the shaft: clear of the lettering of the relief.
fn first_right(joint: &Joint, units: Units) -> f64 {
    if joint.relief <= 0.0 {
        return FIRST;
    }
    let lettering = text_width(&relief_text(joint, units), TYPE);
    FIRST.max(lettering + Length::BEFORE_TEXT + TYPE + 2.0 - STUB)
}

fn relief_text(joint: &Joint, units: Units) -> String {
    format!("relief {}", units.reading(Measure::Size, joint.relief).number)
}

/// The mating diameter with its fit; limits told in words are left to the page.
fn dimension_text(size: &str, callout: &str) -> String {
    const LONGEST: f64 = 36.0;
    let text = format!("Ø{size} {callout}");
    if text_width(&text, TYPE) <= LONGEST { text } else { format!("Ø{size}") }
}

fn foot(layout: &scale::Layout, units: Units) -> String {
    let unit = match units.system {
        UnitSystem::Metric => "millimetres",
        UnitSystem::Inch => "inches",
    };
    format!("scale {} · sizes in {unit}", layout.scale_text)
}

fn caption(layout: &scale::Layout, factor: f64, interference: &[f64]) -> String {
    let mut text = format!("Section, scale {} when printed at full size", layout.scale_text);
    if layout.is_broken() {
        text.push_str("; lengths between break lines are left out");
    }
    if interference.iter().any(|value| *value != 0.0) {
        let factor = super::typeset::number(&format!("{factor}"));
        let what = if interference.iter().any(|value| *value > 0.0) {
            "interference of the tightest pair, shown in colour,"
        } else {
            "clearance of the tightest pair"
        };
        text.push_str(&format!("; the {what} is drawn {factor} times too large"));
    }
    text.push_str(". The shaft is broken off: its length outside the hub is not part of the input.");
    text
}

fn description(joint: &Joint, units: Units) -> String {
    let size = |value: f64| units.text(Measure::Size, value);
    let rings: Vec<String> = joint
        .rings
        .iter()
        .map(|ring| {
            let bore = if ring.inner_diameter > 0.0 {
                format!("inner diameter {}", size(ring.inner_diameter))
            } else {
                "solid".to_owned()
            };
            format!(
                "{} of {}, {bore}, outer diameter {}",
                ring.name,
                ring.material.name,
                size(ring.outer_diameter)
            )
        })
        .collect();
    let fits: Vec<&str> = joint.fits.iter().map(|fit| fit.callout.as_str()).collect();
    format!("{}; fit {}; length {}", rings.join("; "), fits.join(" and "), size(joint.length))
}
