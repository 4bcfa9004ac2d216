//! Tolerance zones of hole and shaft about the nominal line.

use super::Plot;
use super::axis::{Axis, bounds};
use super::chart::{Chart, Margins, Pair, TYPE, WIDTH};
use super::tags::{Lean, Side};
use crate::findings::Findings;
use crate::joint::Fit;
use crate::report::hatch::{self, Rectangle, hatching_of};
use crate::report::svg::{Anchor, INK, Lettering, Pen, Point, QUIET, RULE, Sketch, closed};
use crate::report::text_width::fitted;
use crate::report::typeset::{MINUS, sentence};
use crate::report::units::{Measure, Units};
use crate::tolerance::Limits;

/// Places within the width of one fit.
const HOLE: (f64, f64) = (0.16, 0.34);
const SHAFT: (f64, f64) = (0.46, 0.64);
const LOOSEST: f64 = 0.75;
const TIGHTEST: f64 = 0.87;

/// The tolerance zones of every fit, to scale.
pub fn tolerance_zones(findings: &Findings) -> Plot {
    let joint = &findings.joint;
    let units = Units { system: joint.display };
    let on_axis = |value: f64| units.on_axis(Measure::Deviation, value);
    let values = joint.fits.iter().flat_map(|fit| {
        let limits = &fit.limits;
        [limits.hole.lower, limits.hole.upper, limits.shaft.lower, limits.shaft.upper, 0.0]
    });
    let (low, high) = bounds(values.map(on_axis));
    let air = 0.14 * (high - low);
    let count = joint.fits.len() as f64;
    let mut chart = Chart::new(
        Axis { from: 0.0, to: count, ticks: vec![], title: String::new() },
        Axis::new(
            low - air,
            high + air,
            6,
            format!("deviation from nominal, {}", units.unit(Measure::Deviation)),
        ),
        330.0,
        Margins { left: 62.0, right: 12.0, top: 34.0, bottom: 30.0 },
    );
    chart.rule((0.0, 0.0), (count, 0.0));
    for (index, fit) in joint.fits.iter().enumerate() {
        one_fit(&mut chart, units, fit, index as f64);
    }
    let caption = caption(&joint.fits, units);
    let title = "Tolerance zones";
    let svg = chart.finish("plot-zones", title, &caption, |chart, sketch| {
        for (index, fit) in joint.fits.iter().enumerate() {
            draw_zones(chart, sketch, units, fit, index as f64);
        }
    });
    Plot { title: title.to_owned(), svg, caption }
}

/// Lines and lettering of one fit; its zones are drawn by [`draw_zones`].
fn one_fit(chart: &mut Chart, units: Units, fit: &Fit, left: f64) {
    let on_axis = |value: f64| units.on_axis(Measure::Deviation, value);
    for (limits, zone) in [(fit.limits.hole, HOLE), (fit.limits.shaft, SHAFT)] {
        let mut deviations = vec![(limits.upper, Lean::Up)];
        if limits.lower != limits.upper {
            deviations.push((limits.lower, Lean::Down));
        }
        for (deviation, lean) in deviations {
            let at = (left + zone.0, on_axis(deviation));
            chart.leaning_tag(at, signed(units, deviation), INK, Side::Left, lean);
        }
    }
    let nominal = format!("nominal Ø{}", units.text(Measure::Size, fit.limits.nominal));
    chart.tag((left + 0.52, 0.0), nominal, QUIET, Side::Below);
    let Limits { lower: hole_low, upper: hole_high } = fit.limits.hole;
    let Limits { lower: shaft_low, upper: shaft_high } = fit.limits.shaft;
    for (pair, place, from, to) in
        [(Pair::Loosest, LOOSEST, hole_high, shaft_low), (Pair::Tightest, TIGHTEST, hole_low, shaft_high)]
    {
        let (x, from, to) = (left + place, on_axis(from), on_axis(to));
        chart.curve(vec![(x, from), (x, to)], pair.pen(1.8));
        chart.mark((x, from), pair);
        chart.mark((x, to), pair);
    }
    for (limits, zone) in [(fit.limits.hole, HOLE), (fit.limits.shaft, SHAFT)] {
        let (x0, x1) = (left + zone.0, left + zone.1);
        let (y0, y1) = (on_axis(limits.lower), on_axis(limits.upper));
        chart.obstacle(vec![(x0, y0), (x1, y0), (x1, y1), (x0, y1), (x0, y0)]);
    }
    let interference = fit.limits.interference();
    let tightest = format!("tightest {}", plain_interference(units, interference.tightest));
    let top = on_axis(hole_low.max(shaft_high));
    chart.tag((left + TIGHTEST, top), tightest, Pair::Tightest.colour(), Side::Above);
    let loosest = format!("loosest {}", plain_interference(units, interference.loosest));
    let foot = on_axis(hole_high.min(shaft_low));
    chart.tag((left + LOOSEST, foot), loosest, Pair::Loosest.colour(), Side::Below);
}

fn draw_zones(chart: &Chart, sketch: &mut Sketch, units: Units, fit: &Fit, left: f64) {
    let on_axis = |value: f64| units.on_axis(Measure::Deviation, value);
    let (hole, shaft) = classes(&fit.callout);
    for (limits, zone, kind, name, class) in
        [(fit.limits.hole, HOLE, 1, "hole", hole), (fit.limits.shaft, SHAFT, 0, "shaft", shaft)]
    {
        let (x0, top) = chart.place((left + zone.0, on_axis(limits.upper)));
        let (x1, bottom) = chart.place((left + zone.1, on_axis(limits.lower)));
        let face = Rectangle { left: x0, top, right: x1, bottom };
        let mut hatching = hatching_of(kind);
        hatching.pitch *= 3.5;
        sketch.path(&hatch::lines(&[face], hatching), Pen::solid(RULE, 0.7));
        let corners: [Point; 4] = [(x0, top), (x1, top), (x1, bottom), (x0, bottom)];
        sketch.path(&closed(&corners), Pen::solid(INK, 1.5));
        let text = fitted(&format!("{name} {class}"), TYPE, 0.3 * WIDTH / chart.x.to);
        let middle = 0.5 * (x0 + x1);
        let base = chart.height - chart.margins.bottom + 17.0;
        sketch.text((middle, base), &Lettering::new(text.trim_end(), TYPE).anchor(Anchor::Middle).bold());
    }
}

/// Tolerance classes of hole and shaft when the callout is made of both, such as H7/s6.
fn classes(callout: &str) -> (&str, &str) {
    let is_class = |text: &str| {
        text.len() <= 5
            && text.starts_with(|c: char| c.is_ascii_alphabetic())
            && text.ends_with(|c: char| c.is_ascii_digit())
    };
    match callout.split_once('/') {
        Some((hole, shaft)) if is_class(hole) && is_class(shaft) => (hole, shaft),
        _ => ("", ""),
    }
}

/// A deviation with its sign, as on a drawing.
fn signed(units: Units, value: f64) -> String {
    let number = units.reading(Measure::Deviation, value).number;
    if value > 0.0 && !number.starts_with(MINUS) { format!("+{number}") } else { number }
}

/// Interference or clearance in words.
fn plain_interference(units: Units, value: f64) -> String {
    if value < 0.0 {
        format!("clearance {}", units.text(Measure::Deviation, -value))
    } else {
        units.text(Measure::Deviation, value)
    }
}

#[test]
fn only_a_pair_of_classes_names_the_zones() {
    assert_eq!(classes("H7/s6"), ("H7", "s6"));
    assert_eq!(classes("FN 4"), ("", ""));
    assert_eq!(classes("+30/0 µm"), ("", ""));
}

fn caption(fits: &[Fit], units: Units) -> String {
    let sentences: Vec<String> = fits
        .iter()
        .map(|fit| {
            let interference = fit.limits.interference();
            let word = |value: f64| if value < 0.0 { "a " } else { "an interference of " };
            format!(
                "{}: the loosest pair has {}{}, the tightest {}{}.",
                fit.callout,
                word(interference.loosest),
                plain_interference(units, interference.loosest).replace("clearance ", "clearance of "),
                word(interference.tightest),
                plain_interference(units, interference.tightest).replace("clearance ", "clearance of "),
            )
        })
        .collect();
    sentence(&sentences.join(" "))
}
