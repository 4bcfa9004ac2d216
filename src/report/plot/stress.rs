//! Stress through the walls at both extremes.

use super::Plot;
use super::axis::{Axis, bounds};
use super::chart::{Chart, Margins, Pair, TYPE};
use super::tags::{Lean, Side};
use super::walls::{self, Cut, Profile, Walls};
use crate::findings::{Findings, RingStress};
use crate::joint::Ring;
use crate::material::Kind;
use crate::report::svg::Point;
use crate::report::text_width::fitted;
use crate::report::typeset::THIN;
use crate::report::units::{Measure, Units};

/// Hoop, radial and equivalent stress against radius, with strength and allowable stress of each ring.
///
/// None when no pair grips: nothing is stressed then.
pub fn stress(findings: &Findings) -> Option<Plot> {
    if findings.extremes.tightest.rings.iter().all(|ring| ring.equivalent < 1.0) {
        return None;
    }
    let joint = &findings.joint;
    let units = Units { system: joint.display };
    let cut = Cut::new(findings);
    let walls = Walls::new(&cut.sizes);
    let (loosest, tightest) = cut.profiles(findings);
    let on_axis = |value: f64| units.on_axis(Measure::Pressure, value);

    let curves = tightest.iter().chain(&loosest).flat_map(|p| [&p.hoop, &p.radial, &p.equivalent]);
    let (low, high) = bounds(curves.flatten().map(|point| on_axis(point.1)));
    let shown = |limit: f64| on_axis(limit) <= 2.2 * high.max(-low);
    let limits = limits(findings);
    let top = limits.iter().map(|limit| limit.value).filter(|v| shown(*v)).map(on_axis).fold(high, f64::max);
    let span = (top - low).max(1e-9);
    let y_axis = Axis::new(
        low - 0.06 * span,
        top + 0.1 * span,
        7,
        format!("stress, {}", units.unit(Measure::Pressure)),
    );
    let mut chart = Chart::new(
        walls.axis(units),
        y_axis,
        370.0,
        Margins { left: 62.0, right: 130.0, top: 50.0, bottom: 44.0 },
    );

    chart.rule((0.0, 0.0), (1.0, 0.0));
    for index in 1..joint.rings.len() {
        let (from, _) = walls.ends(index);
        chart.rule((from, chart.y.from), (from, chart.y.to));
    }
    for (pair, profiles) in [(Pair::Loosest, &loosest), (Pair::Tightest, &tightest)] {
        for (index, profile) in profiles.iter().enumerate() {
            draw(&mut chart, &walls, units, index, profile, pair);
        }
    }
    for limit in limits.iter().filter(|limit| shown(limit.value)) {
        let (from, to) = walls.ends(limit.ring);
        let y = on_axis(limit.value);
        let last = limit.ring + 1 == joint.rings.len();
        let name = format!("{} {}", limit.name, units.brief(Measure::Pressure, limit.value).number);
        let at = if last { (to, y) } else { (0.5 * (from + to), y) };
        chart.limit((from, y), (to, y), name, at, if last { Side::Right } else { Side::Above });
    }
    name_pairs(&mut chart, units, &tightest, &loosest);
    for (index, profile) in tightest.iter().enumerate() {
        label(&mut chart, &walls, findings, index, profile);
    }

    if let Some((_, state)) = walls::plastic(findings) {
        let x = walls.place(joint.rings.len() - 1, state.plastic_diameter / 2.0);
        let name = format!("plastic to Ø{}", units.brief(Measure::Size, state.plastic_diameter).number);
        let (low, high) = (chart.y.from, chart.y.to);
        chart.limit((x, low), (x, high), name, (x, 0.5 * low), Side::Right);
    }
    let caption = caption(findings, &cut, &limits, &shown);
    let title = "Stress through the walls, at the shop temperature and at rest";
    let mut headings = Vec::new();
    for (index, ring) in joint.rings.iter().enumerate() {
        let (from, to) = walls.ends(index);
        let room = (to - from) * (chart.place((1.0, 0.0)).0 - chart.place((0.0, 0.0)).0) - 6.0;
        let top = (0.5 * (from + to), chart.y.to);
        headings.push(chart.heading(top, 8.0, &fitted(&ring.name, TYPE, room)));
    }
    let svg = chart.finish("plot-stress", title, &caption, |_, sketch| {
        for (at, heading) in &headings {
            sketch.text(*at, heading);
        }
    });
    Some(Plot { title: title.to_owned(), svg, caption })
}

/// A strength drawn over the width of one ring.
struct Limit {
    ring: usize,
    value: f64,
    name: String,
}

fn limits(findings: &Findings) -> Vec<Limit> {
    let require = &findings.joint.require;
    let mut limits = Vec::new();
    for (index, ring) in findings.joint.rings.iter().enumerate() {
        let Some(strength) = findings.extremes.tightest.rings.get(index).and_then(|ring| ring.strength)
        else {
            continue;
        };
        let (name, safety) = match ring.material.kind {
            Kind::Brittle => ("tensile strength", require.fracture_safety),
            _ => ("yield", require.yield_safety),
        };
        limits.push(Limit { ring: index, value: strength, name: name.to_owned() });
        if safety > 1.0 {
            limits.push(Limit { ring: index, value: strength / safety, name: "allowable".to_owned() });
        }
    }
    limits
}

fn draw(chart: &mut Chart, walls: &Walls, units: Units, ring: usize, profile: &Profile, pair: Pair) {
    let nothing = profile.equivalent.iter().chain(&profile.radial).all(|point| point.1.abs() < 1.0);
    if nothing {
        return;
    }
    for (points, width) in [(&profile.radial, 1.0), (&profile.hoop, 1.5), (&profile.equivalent, 2.6)] {
        let points = points
            .iter()
            .map(|(radius, stress)| (walls.place(ring, *radius), units.on_axis(Measure::Pressure, *stress)))
            .collect();
        chart.curve(points, pair.pen(width));
    }
}

/// Names the curves of the tightest pair at the mating surface, where they are furthest apart.
///
/// Radial stress is the same on both sides of a mating surface, so it is named once, outside of it.
fn label(chart: &mut Chart, walls: &Walls, findings: &Findings, ring: usize, profile: &Profile) {
    let units = Units { system: findings.joint.display };
    let last = ring + 1 == findings.joint.rings.len();
    let (from, to) = walls.ends(ring);
    let (x, side) = if last { (from, Side::Right) } else { (to, Side::Left) };
    let end = |curve: &[Point]| {
        let point = if last { curve.first() } else { curve.last() };
        point.map_or(0.0, |point| point.1)
    };
    let equivalent = match findings.joint.rings[ring].material.kind {
        Kind::Brittle => "greatest tension",
        _ => "equivalent",
    };
    let mut names: Vec<(String, f64)> = vec![(equivalent.to_owned(), end(&profile.equivalent))];
    // A brittle part that is only compressed has no tension to name.
    names.retain(|(_, value)| *value >= 1.0);
    let number = |value: f64| units.brief(Measure::Pressure, value).number;
    let near = |a: f64, b: f64| number(a) == number(b);
    let (hoop, radial) = (end(&profile.hoop), end(&profile.radial));
    match names.iter_mut().find(|(_, value)| near(*value, hoop)) {
        Some((name, _)) => name.push_str(", hoop"),
        None => names.push(("hoop".to_owned(), hoop)),
    }
    match names.iter_mut().find(|(_, value)| near(*value, radial)) {
        Some((name, _)) => name.push_str(", radial"),
        None if last => names.push(("radial".to_owned(), radial)),
        None => {}
    }
    names.sort_by(|a, b| b.1.total_cmp(&a.1));
    for (place, (name, value)) in names.into_iter().enumerate() {
        let at = (x, units.on_axis(Measure::Pressure, value));
        chart.mark(at, Pair::Tightest);
        let text = format!("{name} {}", number(value));
        let lean = if place == 0 { Lean::Up } else { Lean::Down };
        chart.leaning_tag(at, text, Pair::Tightest.colour(), side, lean);
    }
}

/// Names both pairs at the rim of the outermost ring.
fn name_pairs(chart: &mut Chart, units: Units, tightest: &[Profile], loosest: &[Profile]) {
    for (pair, name, profiles) in
        [(Pair::Tightest, "tightest", tightest), (Pair::Loosest, "loosest", loosest)]
    {
        let Some(end) = profiles.last().and_then(|profile| profile.equivalent.last()) else { continue };
        let at = (chart.x.to, units.on_axis(Measure::Pressure, end.1));
        chart.tag(at, name, pair.colour(), Side::Right);
    }
}

fn caption(findings: &Findings, cut: &Cut, limits: &[Limit], shown: &dyn Fn(f64) -> bool) -> String {
    let rings = findings.joint.rings.iter().zip(&cut.tightest);
    let mut sentences: Vec<String> = rings
        .enumerate()
        .map(|(index, (ring, stress))| {
            let hidden = limits.iter().any(|limit| limit.ring == index && !shown(limit.value));
            ring_sentence(findings, ring, stress, hidden)
        })
        .collect();
    if let Some(slice) = cut.slice {
        sentences.push(format!("Cut through slice {}, where the hub is stressed most.", slice + 1));
    }
    sentences.push("Thick: equivalent stress; middle: hoop; thin: radial.".to_owned());
    sentences.join(" ")
}

/// How far the ring is from its strength at the tightest pair.
fn ring_sentence(findings: &Findings, ring: &Ring, stress: &RingStress, hidden: bool) -> String {
    let units = Units { system: findings.joint.display };
    let pressure = |value: f64| units.brief(Measure::Pressure, value).text();
    let (name, brittle) = (&ring.name, ring.material.kind == Kind::Brittle);
    if brittle && stress.equivalent < 1.0 {
        return format!("At the tightest pair the {name} is in compression only.");
    }
    let Some(strength) = stress.strength else {
        return format!(
            "At the tightest pair the {name} reaches {}; its strength is not known.",
            pressure(stress.equivalent)
        );
    };
    let is_hub = findings.joint.rings.last().is_some_and(|hub| std::ptr::eq(hub, ring));
    if let Some((_, state)) = walls::plastic(findings).filter(|_| is_hub) {
        return format!(
            "At the tightest pair the {name} is plastic from the bore to a diameter of {}, {:.1}{THIN}% of its section, by the {} rule; it yields at {}.",
            units.brief(Measure::Size, state.plastic_diameter).text(),
            100.0 * state.plastic_share,
            state.rule.name(),
            pressure(strength)
        );
    }
    let share = 100.0 * stress.equivalent / strength;
    let kind = if brittle { "tensile strength" } else { "yield" };
    let elastic = if share > 100.0 { ", computed as if it stayed elastic" } else { "" };
    let above = if hidden { ", which lies above the picture" } else { "" };
    format!(
        "At the tightest pair the {name} reaches {}, {share:.0}{THIN}% of {kind} ({}{above}){elastic}.",
        pressure(stress.equivalent),
        pressure(strength)
    )
}
