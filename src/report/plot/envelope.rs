//! What is left of the grip at speed and with a hot hub: the picture a user decides from.

use super::Plot;
use super::axis::Axis;
use super::chart::{Chart, Margins, Pair};
use super::tags::Side;
use crate::findings::{Envelope, EnvelopeLine, EnvelopeMeaning, Findings};
use crate::report::svg::{INK, LOOSEST, Pen, Point, QUIET};
use crate::report::units::{Measure, Units};

/// Lines of equal pressure of the loosest pair over speed and hub temperature, with every duty state; none where the
/// joint has more than two rings or steps, or where the loosest pair does not grip.
pub fn envelope(findings: &Findings) -> Option<Plot> {
    let envelope = &findings.envelope().ok()??;
    let units = Units { system: findings.joint.display };
    let temperature = |kelvin: f64| units.on_axis(Measure::Temperature, kelvin);
    let (low, high) = envelope.temperatures;
    let margin = 0.06 * (high - low);
    let mut chart = Chart::new(
        Axis::new(0.0, rpm(envelope.speed_to), 7, "speed, rpm"),
        Axis::new(
            temperature(low - margin),
            temperature(high + margin),
            6,
            format!("hub temperature, {}", units.unit(Measure::Temperature)),
        ),
        320.0,
        Margins { left: 62.0, right: 150.0, top: 30.0, bottom: 44.0 },
    );
    for line in &envelope.lines {
        draw(&mut chart, line, &temperature);
    }
    for state in &envelope.states {
        let at = (rpm(state.speed), temperature(state.temperature));
        chart.mark(at, Pair::Loosest);
        let name = findings.joint.duty.get(state.state).map_or("", |duty| duty.name.as_str());
        chart.tag(at, name, LOOSEST, Side::Above);
    }
    let caption = caption(findings, envelope, units);
    let title = "Pressure left at speed and with a hot hub, loosest pair";
    Some(Plot {
        title: title.to_owned(),
        svg: chart.finish("plot-envelope", title, &caption, |_, _| {}),
        caption,
    })
}

fn rpm(speed: f64) -> f64 {
    speed * 30.0 / std::f64::consts::PI
}

fn draw(chart: &mut Chart, line: &EnvelopeLine, temperature: &dyn Fn(f64) -> f64) {
    let points: Vec<Point> =
        line.points.iter().map(|(speed, kelvin)| (rpm(*speed), temperature(*kelvin))).collect();
    let Some(end) = points.last().copied() else { return };
    let (pen, colour, name) = match line.meaning {
        EnvelopeMeaning::Share(share) => {
            (Pen::solid(QUIET, 0.8), QUIET, format!("{:.0}\u{2009}% left", share * 100.0))
        }
        EnvelopeMeaning::Required => {
            (Pen::dashed(LOOSEST, 1.6, "6 3.5"), LOOSEST, "required safety".to_owned())
        }
        EnvelopeMeaning::Slips => (Pen::solid(LOOSEST, 2.2), LOOSEST, "slips".to_owned()),
        EnvelopeMeaning::Opens => (Pen::solid(INK, 2.2), INK, "opens".to_owned()),
    };
    chart.curve(points, pen);
    chart.tag(end, name, colour, Side::Right);
}

fn caption(findings: &Findings, envelope: &Envelope, units: Units) -> String {
    let joint = &findings.joint;
    let shop = units.text(Measure::Temperature, joint.assembly.shop_temperature);
    let (_, hub) = joint.shaft_and_hub();
    let mut caption = format!(
        "Below and left of a line more pressure is left. Shaft at {shop}, {} at the temperature of the axis. Each state stands \
         at its own speed and at the temperature that leaves its pressure.",
        hub.name
    );
    let crossed: Vec<&str> = envelope
        .states
        .iter()
        .filter(|state| {
            envelope
                .lines
                .iter()
                .any(|line| line.meaning == EnvelopeMeaning::Required && state.pressure < line.pressure)
        })
        .filter_map(|state| joint.duty.get(state.state).map(|duty| duty.name.as_str()))
        .collect();
    if !crossed.is_empty() {
        caption
            .push_str(&format!(" Beyond the required safety for the heaviest load: {}.", crossed.join(", ")));
    }
    caption
}
