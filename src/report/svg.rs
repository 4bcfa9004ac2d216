//! Pens, lines and lettering of the figures, written as SVG that stands without a style sheet.

use maud::{Markup, PreEscaped, html};

use super::text_width::text_width;

/// Ink of outlines and text.
pub(crate) const INK: &str = "#111111";
/// Secondary text: contrast with white 7 : 1.
pub(crate) const QUIET: &str = "#555555";
/// Thin rules, hatching and grid: never used for text.
pub(crate) const RULE: &str = "#9a9a9a";
/// The tightest pair, and the one accent of the report; dark blue.
pub(crate) const TIGHTEST: &str = "#0b4f8a";
/// The loosest pair: dark orange, far from the blue for every common colour vision, lighter in grey.
pub(crate) const LOOSEST: &str = "#b3540a";
/// Dashes of the loosest pair, in units of the line width's mm or px.
pub(crate) const FONT: &str = "Helvetica, Arial, 'Liberation Sans', sans-serif";

/// A point of the figure, x to the right, y downwards.
pub(crate) type Point = (f64, f64);

/// How a line is drawn.
#[derive(Debug, Clone, Copy)]
pub(crate) struct Pen {
    pub colour: &'static str,
    pub width: f64,
    pub dash: Option<&'static str>,
}

impl Pen {
    pub(crate) const fn solid(colour: &'static str, width: f64) -> Self {
        Self { colour, width, dash: None }
    }

    pub(crate) const fn dashed(colour: &'static str, width: f64, dash: &'static str) -> Self {
        Self { colour, width, dash: Some(dash) }
    }
}

/// Where a line of text is held.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) enum Anchor {
    Start,
    Middle,
    End,
}

impl Anchor {
    fn name(self) -> &'static str {
        match self {
            Self::Start => "start",
            Self::Middle => "middle",
            Self::End => "end",
        }
    }
}

/// A line of text before it is placed.
#[derive(Debug, Clone)]
pub(crate) struct Lettering {
    pub text: String,
    pub size: f64,
    pub colour: &'static str,
    pub anchor: Anchor,
    pub bold: bool,
    /// Turned a quarter to be read from the right.
    pub upright: bool,
    /// A white edge, so that a line that passes behind does not strike the text through.
    pub halo: bool,
}

impl Lettering {
    pub(crate) fn new(text: impl Into<String>, size: f64) -> Self {
        Self {
            text: text.into(),
            size,
            colour: INK,
            anchor: Anchor::Start,
            bold: false,
            upright: false,
            halo: false,
        }
    }

    pub(crate) fn colour(mut self, colour: &'static str) -> Self {
        self.colour = colour;
        self
    }

    pub(crate) fn anchor(mut self, anchor: Anchor) -> Self {
        self.anchor = anchor;
        self
    }

    pub(crate) fn bold(mut self) -> Self {
        self.bold = true;
        self
    }

    pub(crate) fn upright(mut self) -> Self {
        self.upright = true;
        self
    }

    pub(crate) fn halo(mut self) -> Self {
        self.halo = true;
        self
    }

    /// Its width; bold letters are about 6 % wider.
    pub(crate) fn width(&self) -> f64 {
        text_width(&self.text, self.size) * if self.bold { 1.06 } else { 1.0 }
    }
}

/// A figure under construction.
#[derive(Debug, Default)]
pub(crate) struct Sketch {
    body: String,
}

impl Sketch {
    pub(crate) fn line(&mut self, from: Point, to: Point, pen: Pen) {
        self.push(html! {
            line x1=(digits(from.0)) y1=(digits(from.1)) x2=(digits(to.0)) y2=(digits(to.1))
                stroke=(pen.colour) stroke-width=(digits(pen.width)) stroke-dasharray=[pen.dash] {}
        });
    }

    /// A path, not filled.
    pub(crate) fn path(&mut self, data: &str, pen: Pen) {
        if data.is_empty() {
            return;
        }
        self.push(html! {
            path d=(data) fill="none" stroke=(pen.colour) stroke-width=(digits(pen.width))
                stroke-dasharray=[pen.dash] stroke-linejoin="round" {}
        });
    }

    /// A filled area without outline.
    pub(crate) fn area(&mut self, data: &str, fill: &str) {
        self.push(html! { path d=(data) fill=(fill) {} });
    }

    /// A dot, filled with `fill` and drawn round.
    pub(crate) fn dot(&mut self, centre: Point, radius: f64, fill: &str, pen: Pen) {
        self.push(html! {
            circle cx=(digits(centre.0)) cy=(digits(centre.1)) r=(digits(radius)) fill=(fill)
                stroke=(pen.colour) stroke-width=(digits(pen.width)) {}
        });
    }

    /// A line of text whose baseline begins, has its middle or ends at `at`.
    pub(crate) fn text(&mut self, at: Point, lettering: &Lettering) {
        let (x, y) = (digits(at.0), digits(at.1));
        let turn = lettering.upright.then(|| format!("rotate(-90 {x} {y})"));
        let halo = lettering.halo.then(|| digits(lettering.size * 0.3));
        self.push(html! {
            text x=(x) y=(y) font-size=(digits(lettering.size)) fill=(lettering.colour)
                text-anchor=(lettering.anchor.name()) font-weight=[lettering.bold.then_some("bold")]
                transform=[turn] stroke=[halo.as_ref().map(|_| "#ffffff")] stroke-width=[halo.as_ref()]
                stroke-linejoin=[halo.as_ref().map(|_| "round")] paint-order=[halo.as_ref().map(|_| "stroke")]
                { (lettering.text) }
        });
    }

    /// Markup made elsewhere, as it is.
    pub(crate) fn push(&mut self, markup: Markup) {
        self.body.push_str(&markup.into_string());
    }

    /// The figure as an `svg` element with title and description for those who cannot see it.
    pub(crate) fn finish(self, frame: &Frame) -> Markup {
        let title_id = format!("{}-title", frame.id);
        let description_id = format!("{}-desc", frame.id);
        html! {
            svg xmlns="http://www.w3.org/2000/svg" id=(frame.id) class=(frame.class) role="img"
                aria-label=(frame.title) aria-describedby=(description_id)
                viewBox=(format!("0 0 {} {}", digits(frame.width), digits(frame.height)))
                width=(format!("{}{}", digits(frame.width), frame.unit))
                height=(format!("{}{}", digits(frame.height), frame.unit)) font-family=(FONT) {
                title id=(title_id) { (frame.title) }
                desc id=(description_id) { (frame.description) }
                (PreEscaped(self.body))
            }
        }
    }
}

/// Name and size of a finished figure.
#[derive(Debug, Clone)]
pub(crate) struct Frame {
    pub id: String,
    pub class: &'static str,
    pub title: String,
    pub description: String,
    pub width: f64,
    pub height: f64,
    /// Unit of width and height on paper: `mm` or `px`.
    pub unit: &'static str,
}

/// A coordinate to a hundredth, without trailing zeros; what is not finite is drawn at zero.
pub(crate) fn digits(value: f64) -> String {
    if !value.is_finite() {
        return "0".to_owned();
    }
    let text = format!("{value:.2}");
    let text = text.trim_end_matches('0').trim_end_matches('.');
    if text == "-0" { "0".to_owned() } else { text.to_owned() }
}

/// Path data of a chain of straight lines.
pub(crate) fn chain(points: &[Point]) -> String {
    points
        .iter()
        .enumerate()
        .map(|(place, (x, y))| format!("{}{} {}", if place == 0 { "M" } else { "L" }, digits(*x), digits(*y)))
        .collect()
}

/// Path data of a closed chain.
pub(crate) fn closed(points: &[Point]) -> String {
    if points.is_empty() { String::new() } else { format!("{}Z", chain(points)) }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Relative luminance and contrast after WCAG 2.2, definitions of both terms.
    fn contrast_with_white(colour: &str) -> f64 {
        let channel = |at: usize| {
            let c = f64::from(u8::from_str_radix(&colour[at..at + 2], 16).unwrap()) / 255.0;
            if c <= 0.04045 { c / 12.92 } else { ((c + 0.055) / 1.055).powf(2.4) }
        };
        let luminance = 0.2126 * channel(1) + 0.7152 * channel(3) + 0.0722 * channel(5);
        1.05 / (luminance + 0.05)
    }

    /// Success criterion 1.4.3 asks 4.5 : 1 for text; the two extremes must also differ in grey.
    #[test]
    fn colours_of_text_can_be_read() {
        for colour in [INK, QUIET, TIGHTEST, LOOSEST] {
            assert!(contrast_with_white(colour) >= 4.5, "{colour}: {}", contrast_with_white(colour));
        }
        assert!(contrast_with_white(TIGHTEST) / contrast_with_white(LOOSEST) > 1.5);
    }

    #[test]
    fn coordinates_are_short_and_finite() {
        assert_eq!(digits(1.0), "1");
        assert_eq!(digits(-0.001), "0");
        assert_eq!(digits(12.345), "12.35");
        assert_eq!(digits(f64::NAN), "0");
    }

    #[test]
    fn text_is_escaped() {
        let mut sketch = Sketch::default();
        sketch.text((0.0, 0.0), &Lettering::new("<script>", 3.0).halo());
        assert!(sketch.body.contains("&lt;script&gt;"));
        assert!(sketch.body.ends_with("</text>"));
    }
}
