//! Recorded press-in force over the window of the joint.

use super::Plot;
use super::axis::Axis;
use super::chart::{Chart, Margins, Pair};
use super::tags::Side;
use crate::pressing::{Judged, Window};
use crate::quantity::UnitSystem;
use crate::report::svg::{INK, Pen, Point, RULE};
use crate::report::text_width::fitted;
use crate::report::units::{Measure, Units};

/// Most records whose curve is drawn; beyond them those within are thinned out evenly.
const MOST_CURVES: usize = 200;
/// Records out whose name stands at the end of their curve.
const MOST_NAMES: usize = 6;
/// Colour of a record that is out: dark red, with its name beside it.
const OUT: &str = "#9b1c1c";

/// Records counted from first touch, over the band between the loosest and the tightest pair.
pub fn press_records(id: &str, window: &Window, records: &[(&str, &Judged)], system: UnitSystem) -> Plot {
    let units = Units { system };
    let on_axes = |travel: f64, force: f64| {
        (units.on_axis(Measure::Size, travel), units.on_axis(Measure::Force, force))
    };
    let course = |points: &[(f64, f64)]| -> Vec<Point> { points.iter().map(|p| on_axes(p.0, p.1)).collect() };
    let (lower, upper) = (course(&window.lower), course(&window.upper));
    let drawn = drawn(records);
    let top = drawn
        .iter()
        .flat_map(|(_, judged)| &judged.shown)
        .map(|point| point.force)
        .fold(window.top(), f64::max)
        .min(1.6 * window.top());
    let end = 1.06 * window.length;
    let begin = -0.04 * window.length;
    let mut chart = Chart::new(
        Axis::new(
            units.on_axis(Measure::Size, begin),
            units.on_axis(Measure::Size, end),
            7,
            format!("travel from first touch, {}", units.unit(Measure::Size)),
        ),
        Axis::new(
            0.0,
            units.on_axis(Measure::Force, 1.08 * top),
            6,
            format!("press force, {}", units.unit(Measure::Force)),
        ),
        340.0,
        Margins { left: 62.0, right: 146.0, top: 30.0, bottom: 44.0 },
    );
    let inside = |points: &mut Vec<Point>| {
        let (x, y) = ((chart.x.from, chart.x.to), (chart.y.from, chart.y.to));
        points.retain(|point| point.0 >= x.0 && point.0 <= x.1);
        points.iter_mut().for_each(|point| point.1 = point.1.clamp(y.0, y.1));
    };
    let (mut low, mut high) = (lower, upper);
    inside(&mut low);
    inside(&mut high);
    let curves: Vec<(&str, bool, Vec<Point>)> = drawn
        .iter()
        .map(|(name, judged)| {
            let mut points: Vec<Point> =
                judged.shown.iter().map(|point| on_axes(point.travel, point.force)).collect();
            inside(&mut points);
            (*name, judged.ok(), points)
        })
        .collect();
    chart.area(high.iter().copied().chain(low.iter().rev().copied()).collect());
    let single = curves.len() == 1;
    for (_, _, points) in curves.iter().filter(|(_, ok, _)| *ok) {
        let pen = if single { Pen::solid(INK, 1.7) } else { Pen::solid(RULE, 0.7) };
        chart.curve(points.clone(), pen);
    }
    chart.curve(high.clone(), Pair::Tightest.pen(2.0));
    chart.curve(low.clone(), Pair::Loosest.pen(1.8));
    for (_, _, points) in curves.iter().filter(|(_, ok, _)| !*ok) {
        chart.curve(points.clone(), Pen::solid(OUT, 1.6));
    }
    if let (Some(high), Some(low)) = (high.last(), low.last()) {
        chart.tag(*high, "tightest, high friction", Pair::Tightest.colour(), Side::Right);
        chart.tag(*low, "loosest, low friction", Pair::Loosest.colour(), Side::Right);
    }
    let names = curves.iter().filter(|(_, ok, _)| !*ok || single).take(MOST_NAMES);
    for (name, ok, points) in names {
        if let Some(last) = points.last() {
            chart.tag(*last, fitted(short(name), 12.0, 130.0), if *ok { INK } else { OUT }, Side::Right);
        }
    }
    let x = units.on_axis(Measure::Size, window.judged_to());
    let rule = (x, chart.y.to);
    chart.limit((x, 0.0), rule, "judged to here", (x, 0.96 * chart.y.to), Side::Left);
    let caption = caption(window, records, units);
    let title = "Recorded force over the joint's window";
    let svg = chart.finish(id, title, &caption, |_, _| {});
    Plot { title: title.to_owned(), svg, caption }
}

/// The file without its folder.
fn short(name: &str) -> &str {
    name.rsplit(['/', '\\']).next().unwrap_or(name)
}

/// Every record that is out and as many of the others as the picture takes.
fn drawn<'a>(records: &[(&'a str, &'a Judged)]) -> Vec<(&'a str, &'a Judged)> {
    let within = records.iter().filter(|(_, judged)| judged.ok()).count();
    let step = within.div_ceil(MOST_CURVES).max(1);
    let mut number = 0;
    let within_or_out = records.iter().filter(|(_, judged)| {
        if !judged.ok() {
            return true;
        }
        number += 1;
        (number - 1) % step == 0
    });
    let mut out = 0;
    within_or_out
        .filter(|(_, judged)| {
            out += usize::from(!judged.ok());
            judged.ok() || out <= MOST_CURVES
        })
        .copied()
        .collect()
}

fn caption(window: &Window, records: &[(&str, &Judged)], units: Units) -> String {
    let force = |value: f64| units.brief(Measure::Force, value).text();
    let end = window.judged_to();
    let band = format!(
        "At {} the force must lie between {} and {}.",
        units.brief(Measure::Size, end).text(),
        force(window.lower_at(end)),
        force(window.upper_at(end))
    );
    match records {
        [(name, judged)] => {
            let verdict = if judged.ok() { "every check is met" } else { "the record is out" };
            format!("{}: {verdict}. {band}", short(name))
        }
        records => {
            let out: Vec<&str> =
                records.iter().filter(|(_, judged)| !judged.ok()).map(|(name, _)| short(name)).collect();
            let named = match out.len() {
                0 => "none is out".to_owned(),
                count if count <= MOST_NAMES => format!("out: {}", out.join(", ")),
                count => format!("{count} are out"),
            };
            format!("{} records, each from its first touch; {named}. {band}", records.len())
        }
    }
}
