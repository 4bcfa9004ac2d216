//! Contact pressure along a stepped joint.

use super::Plot;
use super::axis::Axis;
use super::chart::{Chart, Margins, Pair};
use super::tags::Side;
use crate::findings::{Findings, PairFindings};
use crate::mechanics::slices::{SLICE_DEVIATION, TOTAL_DEVIATION};
use crate::report::svg::Point;
use crate::report::units::{Measure, Units};

/// Pressure of each slice over the length at both extremes; none unless the joint is stepped and grips.
pub fn along(findings: &Findings) -> Option<Plot> {
    let extremes = &findings.extremes;
    if findings.joint.slices.is_empty() || extremes.tightest.pressure <= 0.0 {
        return None;
    }
    let units = Units { system: findings.joint.display };
    let (loosest, tightest) = (steps(&extremes.loosest, units), steps(&extremes.tightest, units));
    let length = tightest.last().map_or(1.0, |point| point.0);
    let top = tightest.iter().chain(&loosest).map(|point| point.1).fold(0.0, f64::max);
    let mut chart = Chart::new(
        Axis::new(0.0, length, 7, format!("along the joint, {}", units.unit(Measure::Size))),
        Axis::new(0.0, 1.12 * top, 6, format!("contact pressure, {}", units.unit(Measure::Pressure))),
        270.0,
        Margins { left: 62.0, right: 150.0, top: 30.0, bottom: 44.0 },
    );
    chart.area(tightest.iter().copied().chain(loosest.iter().rev().copied()).collect());
    for (points, found, pair, name) in [
        (tightest, &extremes.tightest, Pair::Tightest, "tightest"),
        (loosest, &extremes.loosest, Pair::Loosest, "loosest"),
    ] {
        chart.curve(points.clone(), pair.pen(2.0));
        if let Some(end) = points.last() {
            chart.mark(*end, pair);
            let mean = units.brief(Measure::Pressure, found.pressure).text();
            chart.tag(*end, format!("{name}, mean {mean}"), pair.colour(), Side::Right);
        }
    }
    let caption = caption(findings, units);
    let title = "Contact pressure along the stepped joint";
    Some(Plot {
        title: title.to_owned(),
        svg: chart.finish("plot-along", title, &caption, |_, _| {}),
        caption,
    })
}

/// Both ends of each slice with its pressure.
fn steps(pair: &PairFindings, units: Units) -> Vec<Point> {
    let mut from = 0.0;
    let mut points = Vec::new();
    for slice in &pair.slices {
        let pressure = units.on_axis(Measure::Pressure, slice.pressure);
        let to = from + slice.length;
        points.push((units.on_axis(Measure::Size, from), pressure));
        points.push((units.on_axis(Measure::Size, to), pressure));
        from = to;
    }
    points
}

fn caption(findings: &Findings, units: Units) -> String {
    let slices = &findings.extremes.tightest.slices;
    let greatest = slices.iter().enumerate().max_by(|one, other| one.1.pressure.total_cmp(&other.1.pressure));
    let (number, pressure) = greatest.map_or((1, 0.0), |(index, slice)| (index + 1, slice.pressure));
    let percent = |share: f64| format!("{:+.0}\u{2009}%", 100.0 * share);
    format!(
        "Each slice by itself, from the end that enters first; slice {number} is pressed most, {}. In truth the pressure \
         passes smoothly from slice to slice: finite elements find {} to {} of a slice and {} to {} of the sum (own computation, \
         three stepped hubs).",
        units.text(Measure::Pressure, pressure),
        percent(SLICE_DEVIATION.0),
        percent(SLICE_DEVIATION.1),
        percent(TOTAL_DEVIATION.0),
        percent(TOTAL_DEVIATION.1),
    )
}
