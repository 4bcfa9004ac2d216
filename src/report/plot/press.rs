//! Press force against travel.

use super::Plot;
use super::axis::Axis;
use super::chart::{Chart, Margins, Pair};
use super::tags::Side;
use crate::assembly::press::PressCurve;
use crate::findings::Findings;
use crate::joint::Method;
use crate::report::svg::Point;
use crate::report::units::{Measure, Units};

/// The force that pressing takes, as a band between the loosest pair at the low friction and the tightest at
/// the high one; none when no pair grips.
pub fn press_force(findings: &Findings) -> Option<Plot> {
    let assembly = &findings.assembly;
    let (low, high) = (&assembly.press.loosest, &assembly.press.tightest);
    if high.peak_force <= 0.0 {
        return None;
    }
    let units = Units { system: findings.joint.display };
    let on_axis = |curve: &PressCurve| -> Vec<Point> {
        curve
            .points
            .iter()
            .map(|p| (units.on_axis(Measure::Size, p.travel), units.on_axis(Measure::Force, p.force)))
            .collect()
    };
    let force = |value: f64| units.on_axis(Measure::Force, value);
    let (lower, upper) = (on_axis(low), on_axis(high));
    let limits: Vec<(f64, &str)> = [
        (Some(assembly.press_rating), "press rating"),
        (findings.joint.require.press_force, "greatest force allowed"),
    ]
    .into_iter()
    .filter_map(|(value, name)| value.map(|value| (value, name)))
    .collect();

    let peak = force(high.peak_force);
    let shown = |value: f64| force(value) <= 2.5 * peak;
    let top =
        limits.iter().filter(|(value, _)| shown(*value)).map(|(value, _)| force(*value)).fold(peak, f64::max);
    let travel = upper.iter().chain(&lower).map(|point| point.0).fold(0.0, f64::max);
    let mut chart = Chart::new(
        Axis::new(0.0, travel * 1.02, 7, format!("travel, {}", units.unit(Measure::Size))),
        Axis::new(0.0, top * 1.12, 6, format!("press force, {}", units.unit(Measure::Force))),
        300.0,
        Margins { left: 62.0, right: 150.0, top: 30.0, bottom: 44.0 },
    );
    chart.area(upper.iter().copied().chain(lower.iter().rev().copied()).collect());
    chart.curve(upper.clone(), Pair::Tightest.pen(2.0));
    chart.curve(lower.clone(), Pair::Loosest.pen(1.8));
    for (value, name) in limits.iter().filter(|(value, _)| shown(*value)) {
        let y = force(*value);
        let text = format!("{name} {}", units.brief(Measure::Force, *value).text());
        chart.limit((0.0, y), (chart.x.to, y), text, (0.3 * chart.x.to, y), Side::Above);
    }
    peaks(&mut chart, units, low, high);

    let friction = findings.joint.friction.pressing.value;
    let number = |value: f64| units.text(Measure::Number, value);
    let mut caption = match findings.joint.assembly.method {
        Method::Press => "The force",
        _ => "Were the parts pressed together cold instead, the force",
    }
    .to_owned();
    let least = if low.peak_force > 0.0 {
        units.brief(Measure::Force, low.peak_force).text()
    } else {
        "nothing".to_owned()
    };
    caption.push_str(&format!(
        " climbs with the travel and must end between {least} (loosest pair, friction {}) and {} (tightest pair, friction {}), reached at {} of travel.",
        number(friction.low),
        units.brief(Measure::Force, high.peak_force).text(),
        number(friction.high),
        units.brief(Measure::Size, high.peak_travel).text(),
    ));
    for (value, name) in limits.iter().filter(|(value, _)| !shown(*value)) {
        caption.push_str(&format!(
            " The {name}, {}, lies above the picture.",
            units.brief(Measure::Force, *value).text()
        ));
    }
    let title = "Press force along the travel";
    Some(Plot {
        title: title.to_owned(),
        svg: chart.finish("plot-press", title, &caption, |_, _| {}),
        caption,
    })
}

fn peaks(chart: &mut Chart, units: Units, low: &PressCurve, high: &PressCurve) {
    for (curve, pair, name) in [(high, Pair::Tightest, "tightest"), (low, Pair::Loosest, "loosest")] {
        let at = (
            units.on_axis(Measure::Size, curve.peak_travel),
            units.on_axis(Measure::Force, curve.peak_force),
        );
        if curve.peak_force > 0.0 {
            chart.mark(at, pair);
            let text = format!("{name}, {}", units.brief(Measure::Force, curve.peak_force).text());
            chart.tag(at, text, pair.colour(), Side::Right);
        } else {
            chart.tag((chart.x.to, 0.0), format!("{name}: no grip"), pair.colour(), Side::Right);
        }
    }
}
