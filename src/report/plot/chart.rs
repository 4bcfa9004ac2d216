//! A chart in the style of the report: plotters draws axes, areas and curves, the lettering is ours.
//!
//! Plotters rounds to whole pixels, so it draws on a canvas ten times as large, which is then scaled down.

use maud::{Markup, PreEscaped, html};
use plotters::prelude::*;

use super::axis::Axis;
use super::tags::{self, Lean, Placer, Side, Tag};
use crate::report::svg::{
    Anchor, FONT, Frame, INK, LOOSEST, Lettering, Pen, Point, QUIET, Sketch, TIGHTEST, chain,
};

/// Size of a figure, px; it is as wide as the text.
pub(super) const WIDTH: f64 = 642.0;
/// Type size of lettering, px.
pub(super) const TYPE: f64 = 12.0;
/// Enlargement of the canvas.
const FINE: f64 = 10.0;
/// Plotters writes a type size divided by this.
const TYPE_FACTOR: f64 = 1.24;

/// Room round the plotted area, px.
#[derive(Debug, Clone, Copy)]
pub(super) struct Margins {
    pub left: f64,
    pub right: f64,
    pub top: f64,
    pub bottom: f64,
}

/// Which pair of parts a curve belongs to.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Pair {
    /// Solid line, filled mark.
    Tightest,
    /// Dashed line, open mark.
    Loosest,
}

impl Pair {
    pub(super) fn colour(self) -> &'static str {
        match self {
            Self::Tightest => TIGHTEST,
            Self::Loosest => LOOSEST,
        }
    }

    pub(super) fn pen(self, width: f64) -> Pen {
        match self {
            Self::Tightest => Pen::solid(TIGHTEST, width),
            Self::Loosest => Pen::dashed(LOOSEST, width, "6 3.5"),
        }
    }
}

/// A chart under construction; coordinates are those of its axes.
pub(super) struct Chart {
    pub x: Axis,
    pub y: Axis,
    pub height: f64,
    pub margins: Margins,
    areas: Vec<(Vec<Point>, RGBColor)>,
    curves: Vec<(Vec<Point>, Pen)>,
    marks: Vec<(Point, Pair)>,
    tags: Vec<Tag>,
    obstacles: Vec<Vec<Point>>,
    reserved: Vec<tags::Box>,
}

impl Chart {
    pub(super) fn new(x: Axis, y: Axis, height: f64, margins: Margins) -> Self {
        Self {
            x,
            y,
            height,
            margins,
            areas: vec![],
            curves: vec![],
            marks: vec![],
            tags: vec![],
            obstacles: vec![],
            reserved: vec![],
        }
    }

    /// A filled area with light grey.
    pub(super) fn area(&mut self, outline: Vec<Point>) {
        self.areas.push((outline, RGBColor(0xe9, 0xee, 0xf3)));
    }

    pub(super) fn curve(&mut self, points: Vec<Point>, pen: Pen) {
        self.curves.push((points, pen));
    }

    /// A filled or open mark.
    pub(super) fn mark(&mut self, at: Point, pair: Pair) {
        self.marks.push((at, pair));
    }

    /// Lettering that belongs to a point of the chart.
    pub(super) fn tag(&mut self, at: Point, text: impl Into<String>, colour: &'static str, side: Side) {
        self.leaning_tag(at, text, colour, side, Lean::Either);
    }

    /// Lettering that gives way upwards or downwards only.
    pub(super) fn leaning_tag(
        &mut self,
        at: Point,
        text: impl Into<String>,
        colour: &'static str,
        side: Side,
        lean: Lean,
    ) {
        let lettering = Lettering::new(text, TYPE).colour(colour);
        self.tags.push(Tag { at: self.place(at), lettering, side, lean });
    }

    /// A limit: a thin dash-dot line with its name.
    pub(super) fn limit(&mut self, from: Point, to: Point, name: impl Into<String>, at: Point, side: Side) {
        self.curve(vec![from, to], Pen::dashed(INK, 0.9, "11 3 2 3"));
        self.tag(at, name, INK, side);
    }

    /// A thin auxiliary line without name.
    pub(super) fn rule(&mut self, from: Point, to: Point) {
        self.curve(vec![from, to], Pen::solid(crate::report::svg::RULE, 0.7));
    }

    /// Lines drawn elsewhere that lettering should keep off.
    pub(super) fn obstacle(&mut self, points: Vec<Point>) {
        self.obstacles.push(points);
    }

    /// A heading over a part of the chart, its middle `above` px over a point.
    pub(super) fn heading(&mut self, at: Point, above: f64, text: &str) -> (Point, Lettering) {
        let (x, y) = self.place(at);
        let heading = Lettering::new(text, TYPE).bold().anchor(Anchor::Middle);
        let half = 0.5 * heading.width();
        self.reserved.push(tags::Box {
            left: x - half,
            right: x + half,
            top: y - above - TYPE,
            bottom: y - above + 2.0,
        });
        ((x, y - above), heading)
    }

    /// Place of a point of the chart in px.
    pub(super) fn place(&self, (x, y): Point) -> Point {
        let (left, top) = (self.margins.left, self.margins.top);
        let (right, bottom) = (WIDTH - self.margins.right, self.height - self.margins.bottom);
        (left + self.x.share(x) * (right - left), bottom - self.y.share(y) * (bottom - top))
    }

    /// The finished figure; `extra` draws what is not a curve.
    pub(super) fn finish(
        self,
        id: &str,
        title: &str,
        description: &str,
        extra: impl FnOnce(&Self, &mut Sketch),
    ) -> Markup {
        let mut sketch = Sketch::default();
        // Writing into a string does not fail; were it to, the lettering would still stand.
        let drawn = self.drawn_by_plotters().unwrap_or_default();
        sketch.push(html! { g transform="scale(0.1)" { (PreEscaped(inner(&drawn))) } });
        extra(&self, &mut sketch);
        for (points, pen) in self.curves.iter().filter(|(_, pen)| pen.dash.is_some()) {
            let points: Vec<Point> = points.iter().map(|point| self.place(*point)).collect();
            sketch.path(&chain(&points), *pen);
        }
        for (at, pair) in &self.marks {
            let fill = if *pair == Pair::Tightest { TIGHTEST } else { "#ffffff" };
            sketch.dot(self.place(*at), 3.6, fill, Pen::solid(pair.colour(), 1.5));
        }
        self.titles(&mut sketch);
        let mut placer = Placer::new(self.frame(), self.taken(), self.ink());
        for tag in &self.tags {
            placer.place(&mut sketch, tag);
        }
        sketch.finish(&Frame {
            id: id.to_owned(),
            class: "plot",
            title: title.to_owned(),
            description: description.to_owned(),
            width: WIDTH,
            height: self.height,
            unit: "px",
        })
    }

    fn drawn_by_plotters(&self) -> Result<String, Box<dyn std::error::Error>> {
        let fine = |value: f64| (value * FINE).round() as u32;
        let mut buffer = String::new();
        {
            let root = SVGBackend::with_string(&mut buffer, (fine(WIDTH), fine(self.height)));
            let root = root.into_drawing_area();
            let mut chart = ChartBuilder::on(&root)
                .margin_top(fine(self.margins.top))
                .margin_right(fine(self.margins.right))
                .x_label_area_size(fine(self.margins.bottom))
                .y_label_area_size(fine(self.margins.left))
                .build_cartesian_2d(self.x.clone(), self.y.clone())?;
            let type_size = TYPE * 0.95 * FINE * TYPE_FACTOR;
            let style = || (FONT, type_size).into_font().color(&RGBColor(0x33, 0x33, 0x33));
            let mut mesh = chart.configure_mesh();
            mesh.disable_mesh()
                .axis_style(RGBColor(0x11, 0x11, 0x11).stroke_width(fine(0.8)))
                .set_all_tick_mark_size(fine(4.0))
                .x_label_style(style())
                .y_label_style(style());
            let (of_x, of_y) =
                (|value: &f64| lettering(&self.x, *value), |value: &f64| lettering(&self.y, *value));
            mesh.x_labels(self.x.ticks.len().max(1))
                .y_labels(self.y.ticks.len().max(1))
                .x_label_formatter(&of_x)
                .y_label_formatter(&of_y)
                .draw()?;
            for (outline, colour) in &self.areas {
                chart.draw_series(std::iter::once(Polygon::new(outline.clone(), colour.filled())))?;
            }
            for (points, pen) in self.curves.iter().filter(|(_, pen)| pen.dash.is_none()) {
                let style = colour(pen.colour).stroke_width(fine(pen.width));
                chart.draw_series(LineSeries::new(points.iter().copied(), style))?;
            }
            root.present()?;
        }
        Ok(buffer)
    }

    /// Quantity and unit: of y above its axis, of x below the right end of its own.
    fn titles(&self, sketch: &mut Sketch) {
        let (y, x) = (self.y_title(), self.x_title());
        sketch.text(y.1, &y.0);
        sketch.text(x.1, &x.0);
    }

    fn y_title(&self) -> (Lettering, Point) {
        (Lettering::new(&self.y.title, TYPE).colour(QUIET), (0.0, TYPE))
    }

    fn x_title(&self) -> (Lettering, Point) {
        let title = Lettering::new(&self.x.title, TYPE).colour(QUIET);
        let x = WIDTH - self.margins.right - title.width();
        (title, (x.max(0.0), self.height - 4.0))
    }

    fn frame(&self) -> tags::Box {
        tags::Box {
            left: self.margins.left + 2.0,
            top: 0.0,
            right: WIDTH,
            bottom: self.height - self.margins.bottom - 1.0,
        }
    }

    /// Room taken by titles and marks.
    fn taken(&self) -> Vec<tags::Box> {
        let title = self.y_title();
        let mut taken = vec![tags::Box {
            left: title.1.0,
            right: title.1.0 + title.0.width(),
            top: title.1.1 - TYPE,
            bottom: title.1.1 + 3.0,
        }];
        taken.extend(&self.reserved);
        taken.extend(self.marks.iter().map(|(at, _)| {
            let (x, y) = self.place(*at);
            tags::Box { left: x - 4.5, right: x + 4.5, top: y - 4.5, bottom: y + 4.5 }
        }));
        taken
    }

    fn ink(&self) -> Vec<Point> {
        self.curves
            .iter()
            .map(|(points, _)| points)
            .chain(&self.obstacles)
            .flat_map(|points| {
                let points: Vec<Point> = points.iter().map(|point| self.place(*point)).collect();
                tags::along(&points, 4.0)
            })
            .collect()
    }
}

/// Lettering of the tick at `value`.
fn lettering(axis: &Axis, value: f64) -> String {
    axis.ticks.iter().find(|(tick, _)| *tick == value).map_or_else(String::new, |(_, text)| text.clone())
}

fn colour(hexadecimal: &str) -> RGBColor {
    let channel = |at: usize| {
        hexadecimal.get(at..at + 2).and_then(|digits| u8::from_str_radix(digits, 16).ok()).unwrap_or(0)
    };
    RGBColor(channel(1), channel(3), channel(5))
}

/// What stands between the opening and the closing tag of an `svg` text.
fn inner(svg: &str) -> &str {
    let from = svg.find("<svg").and_then(|at| svg[at..].find('>').map(|end| at + end + 1)).unwrap_or(0);
    let to = svg.rfind("</svg>").unwrap_or(svg.len());
    svg.get(from..to).unwrap_or("")
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Curves are drawn by plotters, marks and dashes by us: both must put a point at the same place.
    #[test]
    fn plotters_and_the_overlay_agree_on_every_place() {
        let margins = Margins { left: 62.0, right: 130.0, top: 40.0, bottom: 44.0 };
        let mut chart =
            Chart::new(Axis::new(-3.0, 7.0, 5, "x"), Axis::new(-200.0, 900.0, 5, "y"), 360.0, margins);
        let points = vec![(-3.0, -200.0), (0.3, 411.0), (7.0, 900.0)];
        chart.curve(points.clone(), Pair::Tightest.pen(2.0));
        let svg = chart.drawn_by_plotters().unwrap();
        let line = svg.split("<polyline").find(|part| part.contains("#0B4F8A")).unwrap();
        let written = line.split("points=\"").nth(1).unwrap().split('"').next().unwrap();
        let drawn: Vec<Point> = written
            .split_whitespace()
            .map(|pair| pair.split_once(',').unwrap())
            .map(|(x, y)| (x.parse::<f64>().unwrap() / FINE, y.parse::<f64>().unwrap() / FINE))
            .collect();
        assert_eq!(drawn.len(), points.len());
        for (drawn, point) in drawn.iter().zip(&points) {
            let (x, y) = chart.place(*point);
            assert!((drawn.0 - x).abs() <= 0.2 && (drawn.1 - y).abs() <= 0.2, "{drawn:?} {x} {y}");
        }
    }
}
