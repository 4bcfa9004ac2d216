//! Histogram and tails of a population, with the extremes marked.

use super::Plot;
use super::axis::{Axis, bounds};
use super::chart::{Chart, Margins, Pair};
use super::tags::Side;
use crate::joint::Joint;
use crate::population::scatter::{Quantity, Scatter, Spread};
use crate::report::svg::{INK, Pen, Point};
use crate::report::typeset;
use crate::report::units::{Measure, Units};

/// Least share on a tail plot, as a power of ten.
const LEAST_POWER: f64 = -12.0;

/// Histogram and tails of the interference and of the torque capacity.
pub fn population(joint: &Joint, scatter: &Scatter) -> Vec<Plot> {
    let units = Units { system: joint.display };
    scatter
        .quantities
        .iter()
        .filter_map(|spread| {
            let measure = match spread.quantity {
                Quantity::Interference => Measure::Deviation,
                Quantity::TorqueCapacity => Measure::Torque,
                _ => return None,
            };
            Some((spread, measure))
        })
        .flat_map(|(spread, measure)| {
            let picture = Picture { units, measure, spread, limits: scatter.model.limits(spread.quantity) };
            let loads: Vec<(f64, String)> = if spread.quantity == Quantity::TorqueCapacity {
                let states = joint.duty.iter().filter(|state| state.torque > 0.0 && state.axial_force == 0.0);
                states.map(|state| (state.torque, state.name.clone())).collect()
            } else {
                Vec::new()
            };
            [picture.histogram(&loads), picture.tails(&loads)]
        })
        .collect()
}

struct Picture<'a> {
    units: Units,
    measure: Measure,
    spread: &'a Spread,
    limits: (f64, f64),
}

impl Picture<'_> {
    fn x(&self, value: f64) -> f64 {
        self.units.on_axis(self.measure, value)
    }

    fn name(&self) -> &'static str {
        self.spread.quantity.name()
    }

    fn text(&self, value: f64) -> String {
        self.units.brief(self.measure, value).text()
    }

    fn id(&self, kind: &str) -> String {
        format!("plot-{kind}-{}", self.name().replace(' ', "-"))
    }

    fn x_axis(&self, values: impl Iterator<Item = f64>) -> Axis {
        let (low, high) = bounds(values);
        let air = 0.03 * (high - low);
        Axis::new(low - air, high + air, 7, format!("{}, {}", self.name(), self.units.unit(self.measure)))
    }

    fn histogram(&self, loads: &[(f64, String)]) -> Plot {
        let classes = &self.spread.classes;
        let total: f64 = classes.iter().map(|class| class.2).sum();
        let height = |class: &(f64, f64, f64)| 100.0 * class.2 * typical(classes) / (class.1 - class.0);
        let top = classes.iter().map(height).fold(0.0, f64::max);
        let ends = [self.limits.0, self.limits.1].map(|end| self.x(end));
        let x = self.x_axis(classes.iter().flat_map(|class| [self.x(class.0), self.x(class.1)]).chain(ends));
        let mut chart = Chart::new(
            x,
            Axis::new(0.0, top * 1.22, 5, "share of the pairs in a class, %"),
            280.0,
            Margins { left: 62.0, right: 20.0, top: 30.0, bottom: 44.0 },
        );
        let mut outline: Vec<Point> = Vec::new();
        for class in classes {
            let (from, to, y) = (self.x(class.0), self.x(class.1), height(class));
            outline.extend([(from, y), (to, y)]);
        }
        if let (Some(first), Some(last)) = (outline.first().copied(), outline.last().copied()) {
            let closed = [(first.0, 0.0)].into_iter().chain(outline.iter().copied()).chain([(last.0, 0.0)]);
            chart.area(closed.collect());
        }
        chart.curve(outline, Pen::solid(INK, 1.0));
        self.extremes(&mut chart, top * 1.08);
        self.loads(&mut chart, loads, top * 0.5);
        let caption = format!(
            "Counted classes of the {}; mean {}, standard deviation {}. The extreme pairs lie at {} and {}. {} % of the pairs are in the picture.",
            self.name(),
            self.text(self.spread.moments.0),
            self.text(self.spread.moments.1),
            self.text(self.limits.0),
            self.text(self.limits.1),
            typeset::number(&format!("{:.3}", 100.0 * total)),
        );
        let title = format!("Histogram of the {}", self.name());
        let svg = chart.finish(&self.id("histogram"), &title, &caption, |_, _| {});
        Plot { title, svg, caption }
    }

    fn tails(&self, loads: &[(f64, String)]) -> Plot {
        let curve = &self.spread.curve;
        let power = |share: f64| share.max(10f64.powf(LEAST_POWER)).log10();
        let ends = [self.limits.0, self.limits.1].map(|end| self.x(end));
        let x = self.x_axis(curve.iter().map(|point| self.x(point.0)).chain(ends));
        let ticks = [0.0, -3.0, -6.0, -9.0, -12.0]
            .map(|power: f64| (power, typeset::number(&format!("1e{power:.0}")).replace("1·", "")))
            .map(|(power, text)| (power, if power == 0.0 { "1".to_owned() } else { text }));
        let mut chart = Chart::new(
            x,
            Axis {
                from: LEAST_POWER,
                to: 0.9,
                ticks: ticks.to_vec(),
                title: "share of the pairs".to_owned(),
            },
            300.0,
            Margins { left: 62.0, right: 20.0, top: 30.0, bottom: 44.0 },
        );
        let side = |pick: fn(&(f64, f64, f64)) -> f64| -> Vec<Point> {
            curve
                .iter()
                .filter(|point| pick(point) >= 10f64.powf(LEAST_POWER))
                .map(|point| (self.x(point.0), power(pick(point))))
                .collect()
        };
        let (below, above) = (side(|point| point.1), side(|point| point.2));
        if let (Some(low), Some(high)) =
            (below.get(below.len() / 4).copied(), above.get(above.len() * 3 / 4).copied())
        {
            chart.tag(low, "below", INK, Side::Left);
            chart.tag(high, "above", INK, Side::Right);
        }
        chart.curve(below, Pen::solid(INK, 1.6));
        chart.curve(above, Pen::solid(INK, 1.6));
        self.extremes(&mut chart, 0.3);
        self.loads(&mut chart, loads, 0.5 * LEAST_POWER);
        let caption = format!(
            "Integrated share of the pairs below, and above, each value of the {}, down to one in a million million.",
            self.name()
        );
        let title = format!("Tails of the {}", self.name());
        let svg = chart.finish(&self.id("tails"), &title, &caption, |_, _| {});
        Plot { title, svg, caption }
    }

    fn extremes(&self, chart: &mut Chart, at: f64) {
        for (end, pair, name, side) in [
            (self.limits.0, Pair::Loosest, "loosest", Side::Right),
            (self.limits.1, Pair::Tightest, "tightest", Side::Left),
        ] {
            let x = self.x(end);
            chart.curve(vec![(x, chart.y.from), (x, at)], pair.pen(1.4));
            chart.mark((x, at), pair);
            chart.tag((x, at), format!("{name} {}", self.text(end)), pair.colour(), side);
        }
    }

    fn loads(&self, chart: &mut Chart, loads: &[(f64, String)], at: f64) {
        for (load, name) in loads {
            let x = self.x(*load);
            if x > chart.x.from && x < chart.x.to {
                let text = format!("{name} {}", self.text(*load));
                chart.limit((x, chart.y.from), (x, chart.y.to), text, (x, at), Side::Left);
            }
        }
    }
}

/// Width of most classes.
fn typical(classes: &[(f64, f64, f64)]) -> f64 {
    classes.first().map_or(1.0, |class| class.1 - class.0)
}
