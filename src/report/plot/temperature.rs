//! Diameters of bore and shaft against temperature: where the parts clear.

use super::Plot;
use super::axis::{Axis, bounds};
use super::chart::{Chart, Margins, Pair};
use super::tags::Side;
use crate::findings::{Findings, bath_name};
use crate::joint::{Method, Ring};
use crate::report::svg::{INK, Pen, Point, QUIET};
use crate::report::units::{Measure, Units};

/// Points of each curve.
const POINTS: usize = 49;

/// Bore of the hub and diameter of the shaft, tightest pair, against the temperature of each part.
pub fn diameters(findings: &Findings) -> Option<Plot> {
    let joint = &findings.joint;
    let units = Units { system: joint.display };
    let fit = joint.fits.get(joint.last_interface())?;
    let (shaft, hub) = joint.joined_last();
    let nominal = fit.limits.nominal;
    let (bore, pin) = (nominal + fit.limits.hole.lower, nominal + fit.limits.shaft.upper);
    let shop = joint.assembly.shop_temperature;
    let assembly = &findings.assembly;

    let coldest = assembly.baths.iter().map(|bath| bath.temperature).fold(shop, f64::min);
    let hottest = assembly
        .heat_hub
        .temperature
        .into_iter()
        .chain(assembly.hub_limit.as_ref().map(|limit| limit.0))
        .fold(shop + 100.0, f64::max);
    let hub_curve = curve(hub, bore, nominal, (shop, hottest));
    let shaft_curve = curve(shaft, pin, nominal, (coldest, shop));
    if hub_curve.is_empty() || shaft_curve.is_empty() {
        return None;
    }
    let place = |(temperature, deviation): Point| {
        (units.on_axis(Measure::Temperature, temperature), units.on_axis(Measure::Deviation, deviation))
    };
    let hub_curve: Vec<Point> = hub_curve.into_iter().map(place).collect();
    let shaft_curve: Vec<Point> = shaft_curve.into_iter().map(place).collect();
    let at_shop = |diameter: f64, part: &Ring| {
        let strain = part.material.expansion.strain(shop).unwrap_or(0.0);
        diameter * (1.0 + strain) - nominal
    };
    let (bore_level, pin_level) = (at_shop(bore, hub), at_shop(pin, shaft));
    let levels = [bore_level - assembly.clearance, pin_level + assembly.clearance]
        .map(|level| units.on_axis(Measure::Deviation, level));
    let (low, high) = bounds(hub_curve.iter().chain(&shaft_curve).map(|point| point.1).chain(levels));
    let air = 0.08 * (high - low);
    let margin = 0.03 * (hottest - coldest);
    let (left, right) = (
        units.on_axis(Measure::Temperature, coldest - margin),
        units.on_axis(Measure::Temperature, hottest + margin),
    );
    let unit = units.unit(Measure::Deviation);
    let mut chart = Chart::new(
        Axis::new(left, right, 8, format!("temperature of the part, {}", units.unit(Measure::Temperature))),
        Axis::new(low - air, high + air, 6, format!("diameter minus nominal, {unit}")),
        360.0,
        Margins { left: 62.0, right: 118.0, top: 46.0, bottom: 44.0 },
    );
    let ends = (hub_curve[hub_curve.len() - 1], shaft_curve[0]);
    chart.curve(hub_curve, Pair::Tightest.pen(2.2));
    chart.curve(shaft_curve, Pair::Tightest.pen(2.2));
    chart.tag(ends.0, format!("bore of the {}", hub.name), Pair::Tightest.colour(), Side::Right);
    chart.tag(ends.1, shaft.name.clone(), Pair::Tightest.colour(), Side::Below);
    let levels = Levels { shop, coldest, hottest, bore: bore_level, shaft: pin_level };
    clearances(&mut chart, findings, units, &levels);
    named_temperatures(&mut chart, findings, units);
    let caption = caption(findings, units, &shaft.name, &hub.name);
    let title = "Diameters against temperature, tightest pair";
    Some(Plot {
        title: title.to_owned(),
        svg: chart.finish("plot-diameters", title, &caption, |_, _| {}),
        caption,
    })
}

/// Temperatures of the plot, K, and diameters minus nominal in the shop, m.
struct Levels {
    shop: f64,
    coldest: f64,
    hottest: f64,
    bore: f64,
    shaft: f64,
}

/// (temperature K, diameter minus nominal m) over as much of the range as the expansion curve covers.
fn curve(ring: &Ring, diameter: f64, nominal: f64, (from, to): (f64, f64)) -> Vec<Point> {
    let (low, high) = ring.material.expansion.range();
    let (from, to) = (from.max(low), to.min(high));
    if to <= from {
        return vec![];
    }
    (0..POINTS)
        .map(|i| from + (to - from) * i as f64 / (POINTS - 1) as f64)
        .filter_map(|t| {
            let strain = ring.material.expansion.strain(t.clamp(low, high)).ok()?;
            Some((t, diameter * (1.0 + strain) - nominal))
        })
        .collect()
}

/// The diameters that clear the other part, and the temperature at which each part reaches them.
fn clearances(chart: &mut Chart, findings: &Findings, units: Units, levels: &Levels) {
    let assembly = &findings.assembly;
    let deviation = |value: f64| units.on_axis(Measure::Deviation, value);
    let mut level = |from: f64, temperature: Option<f64>, start: f64, end: f64| {
        let Some(temperature) = temperature.filter(|t| (levels.coldest..=levels.hottest).contains(t)) else {
            return;
        };
        let x = units.on_axis(Measure::Temperature, temperature);
        let foot = units.on_axis(Measure::Temperature, from);
        let (start, end) = (deviation(start), deviation(end));
        chart.curve(vec![(foot, start), (foot, end), (x, end)], Pen::solid(QUIET, 0.8));
        chart.mark((x, end), Pair::Tightest);
        let wanted = format!("clearance {}", units.text(Measure::Deviation, assembly.clearance));
        chart.tag(
            (foot, 0.5 * (start + end)),
            wanted,
            QUIET,
            if x > foot { Side::Left } else { Side::Right },
        );
        let text = format!("clears at {}", units.text(Measure::Temperature, temperature));
        chart.tag((x, end), text, INK, Side::Above);
    };
    let wanted = assembly.clearance;
    match findings.joint.assembly.method {
        Method::HeatAndChill => {
            for bath in assembly.baths.iter().filter(|bath| bath.bath == findings.joint.assembly.bath) {
                let Some(shrinkage) = bath.shrinkage else { continue };
                let shaft = levels.shaft - shrinkage;
                level(bath.temperature, bath.hub_temperature, shaft, shaft + wanted);
            }
        }
        Method::ChillShaft => {
            level(levels.shop, assembly.chill_shaft.temperature, levels.bore, levels.bore - wanted);
        }
        Method::HeatHub | Method::Press => {
            level(levels.shop, assembly.heat_hub.temperature, levels.shaft, levels.shaft + wanted);
            level(levels.shop, assembly.chill_shaft.temperature, levels.bore, levels.bore - wanted);
        }
    }
}

/// Baths, shop and the limit of the hub as named lines.
fn named_temperatures(chart: &mut Chart, findings: &Findings, units: Units) {
    let (bottom, top) = (chart.y.from, chart.y.to);
    let assembly = &findings.assembly;
    let mut line = |temperature: f64, name: String| {
        let x = units.on_axis(Measure::Temperature, temperature);
        if x >= chart.x.from && x <= chart.x.to {
            chart.limit((x, bottom), (x, top), name, (x, top), Side::Above);
        }
    };
    for bath in &assembly.baths {
        line(bath.temperature, bath_name(bath.bath).to_owned());
    }
    line(findings.joint.assembly.shop_temperature, "shop".to_owned());
    if let Some((limit, _)) = &assembly.hub_limit {
        line(*limit, format!("limit {}", units.text(Measure::Temperature, *limit)));
    }
}

fn caption(findings: &Findings, units: Units, shaft: &str, hub: &str) -> String {
    let assembly = &findings.assembly;
    let temperature = |value: f64| units.text(Measure::Temperature, value);
    let mut text = format!(
        "With {} of clearance wanted, the parts must differ by {}.",
        units.text(Measure::Deviation, assembly.clearance),
        units.text(Measure::Deviation, assembly.needed),
    );
    match assembly.heat_hub.temperature {
        Some(t) => text.push_str(&format!(" The bore of the {hub} clears at {}.", temperature(t))),
        None => text.push_str(&format!(" The bore of the {hub} does not clear within its expansion curve.")),
    }
    match assembly.chill_shaft.temperature {
        Some(t) => text.push_str(&format!(" The {shaft} alone clears at {}.", temperature(t))),
        None => text.push_str(&format!(" No cold within its expansion curve makes the {shaft} clear alone.")),
    }
    if findings.joint.assembly.method == Method::HeatAndChill
        && let Some(bath) = assembly.baths.iter().find(|bath| bath.bath == findings.joint.assembly.bath)
        && let Some(hot) = bath.hub_temperature
    {
        text.push_str(&format!(
            " With the {shaft} in {} the {hub} needs {}.",
            bath_name(bath.bath),
            temperature(hot)
        ));
    }
    text
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::report::sample;

    /// At the temperature found, the bore as drawn is the shaft in the shop and the clearance wanted.
    #[test]
    fn the_mark_lies_on_the_curve_of_the_bore() {
        let findings = sample::hollow_shaft();
        let joint = &findings.joint;
        let (fit, hub) = (&joint.fits[0].limits, &joint.rings[1]);
        let hot = findings.assembly.heat_hub.temperature.unwrap();
        let curve = curve(hub, fit.nominal + fit.hole.lower, fit.nominal, (293.15, hot));
        let bore = curve.last().unwrap().1;
        let wanted = fit.shaft.upper + findings.assembly.clearance;
        assert!((bore - wanted).abs() < 1e-9, "{bore} {wanted}");
    }

    #[test]
    fn no_curve_goes_beyond_the_data() {
        let hub = &sample::clearance().joint.rings[1];
        let (low, high) = hub.material.expansion.range();
        let points = curve(hub, 0.06, 0.06, (0.0, 5000.0));
        assert!(points.iter().all(|point| point.0 >= low - 1e-9 && point.0 <= high + 1e-9));
        assert!(curve(hub, 0.06, 0.06, (high + 1.0, high + 2.0)).is_empty());
    }
}
