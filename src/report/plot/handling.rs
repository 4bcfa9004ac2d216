//! Clearance against seconds from oven or bath.

use super::Plot;
use super::axis::Axis;
use super::chart::{Chart, Margins, Pair};
use super::tags::{Lean, Side};
use crate::assembly::handling::{HandlingCourse, HandlingPoint};
use crate::findings::Findings;
use crate::report::seating::time_allowed;
use crate::report::svg::Point;
use crate::report::units::{Measure, Units};

/// Longest time shown, as a multiple of the time of the tightest pair.
const SHOWN: f64 = 3.0;
/// Time shown when the tightest pair never touches, s.
const AT_EASE: f64 = 600.0;
/// Above this time the axis is in minutes, s.
const MINUTES: f64 = 600.0;

/// How the clearance goes while the hot hub cools and the cold shaft warms; none when nothing is heated or chilled.
pub fn handling(findings: &Findings) -> Option<Plot> {
    let found = findings.assembly.times.handling.as_ref()?;
    let units = Units { system: findings.joint.display };
    let required = findings.joint.assembly.practice.handling_time;
    let gone = found.tightest.gone.filter(|gone| *gone > 0.0);
    let last = |course: &HandlingCourse| course.points.last().map_or(0.0, |point| point.time);
    let longest = gone.map_or(AT_EASE, |gone| SHOWN * gone).max(1.2 * required.unwrap_or(0.0));
    let until = last(&found.loosest).max(last(&found.tightest)).max(required.unwrap_or(0.0)).min(longest);
    let (per_second, unit) = if until > MINUTES { (1.0 / 60.0, "min") } else { (1.0, "s") };
    let on_axis =
        |point: &HandlingPoint| (point.time * per_second, units.on_axis(Measure::Deviation, point.clearance));
    let (tight, loose) = (shown(&found.tightest, until), shown(&found.loosest, until));
    let top = tight.iter().chain(&loose).map(|point| on_axis(point).1).fold(1.0, f64::max);
    let mut chart = Chart::new(
        Axis::new(0.0, 1.02 * until.max(1.0) * per_second, 7, format!("time, {unit}")),
        Axis::new(0.0, 1.1 * top, 6, format!("clearance, {}", units.unit(Measure::Deviation))),
        300.0,
        Margins { left: 62.0, right: 150.0, top: 30.0, bottom: 44.0 },
    );
    for (points, pair, width) in [(&tight, Pair::Tightest, 2.0), (&loose, Pair::Loosest, 1.8)] {
        chart.curve(points.iter().map(on_axis).collect(), pair.pen(width));
    }
    if found.least > 0.0 {
        let least = units.on_axis(Measure::Deviation, found.least);
        let text = format!("form error {}", units.text(Measure::Deviation, found.least));
        chart.limit((0.0, least), (chart.x.to, least), text, (0.15 * chart.x.to, least), Side::Above);
    }
    if let Some(required) = required.filter(|required| *required <= until) {
        let at = required * per_second;
        let text = format!("needed {}", time_allowed(required));
        chart.limit((at, 0.0), (at, chart.y.to), text, (at, 0.96 * chart.y.to), Side::Right);
    }
    ends(&mut chart, &tight, found.tightest.gone, Pair::Tightest, &on_axis);
    ends(&mut chart, &loose, found.loosest.gone, Pair::Loosest, &on_axis);
    let title = "Time from oven or bath to seated";
    let caption = caption(findings);
    Some(Plot {
        title: title.to_owned(),
        svg: chart.finish("plot-handling", title, &caption, |_, _| {}),
        caption,
    })
}

/// The points to `until` (s), the last one in its place on the line.
fn shown(course: &HandlingCourse, until: f64) -> Vec<HandlingPoint> {
    let mut points: Vec<HandlingPoint> =
        course.points.iter().filter(|point| point.time <= until).copied().collect();
    let after = course.points.iter().find(|point| point.time > until);
    if let (Some(before), Some(after)) = (points.last().copied(), after) {
        let share = (until - before.time) / (after.time - before.time);
        let between = |from: f64, to: f64| from + share * (to - from);
        points.push(HandlingPoint {
            time: until,
            clearance: between(before.clearance, after.clearance),
            hub_temperature: between(before.hub_temperature, after.hub_temperature),
            shaft_temperature: between(before.shaft_temperature, after.shaft_temperature),
        });
    }
    points
}

fn ends(
    chart: &mut Chart,
    points: &[HandlingPoint],
    gone: Option<f64>,
    pair: Pair,
    on_axis: &dyn Fn(&HandlingPoint) -> Point,
) {
    let Some(end) = points.last() else { return };
    let name = if pair == Pair::Tightest { "tightest" } else { "loosest" };
    let at = on_axis(end);
    let seated = gone.filter(|gone| *gone <= end.time * 1.01 + 0.05);
    let text = match (seated, gone) {
        (Some(gone), _) => {
            chart.mark(at, pair);
            format!("{name}, {}", time_allowed(gone))
        }
        (None, Some(gone)) => format!("{name}, to {}", time_allowed(gone)),
        (None, None) => format!("{name}, always passes"),
    };
    if pair == Pair::Tightest && at.0 > 0.35 * chart.x.to {
        // The room under a falling curve is free.
        chart.leaning_tag(at, text, pair.colour(), Side::Left, Lean::Up);
    } else {
        chart.tag(at, text, pair.colour(), Side::Right);
    }
}

fn caption(findings: &Findings) -> String {
    let headline = crate::report::seating::headline(findings).unwrap_or_default();
    let transfer = findings.joint.assembly.practice.transfer_time;
    let overlap = if transfer > 0.0 {
        format!("The parts overlap {} after leaving", time_allowed(transfer))
    } else {
        "The parts are taken to overlap at once".to_owned()
    };
    format!(
        "{headline} {overlap}; from then on heat crosses the gap between them, the faster the narrower it gets. The parts are \
         taken as concentric: where they touch on one side it is sooner."
    )
}
