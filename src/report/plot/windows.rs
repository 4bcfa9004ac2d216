//! Interference windows of the chosen fits against the band that is allowed.

use super::Plot;
use super::axis::{Axis, bounds};
use super::chart::{Chart, Margins, Pair, TYPE};
use super::tags::Side;
use crate::population::choose::{Choice, ChosenFit};
use crate::report::choose::words;
use crate::report::svg::{Anchor, INK, Lettering, Pen, QUIET, RULE};
use crate::report::units::{Measure, Units};

/// Height of one fit, px.
const ROW: f64 = 19.0;

/// One bar from the loosest to the tightest pair for each fit, the allowed band behind them.
///
/// None when there is neither a fit nor a finite edge to show.
pub fn interference_windows(choice: &Choice, fits: &[&ChosenFit]) -> Option<Plot> {
    let units = Units { system: choice.joint.display };
    let on_axis = |value: f64| units.on_axis(Measure::Deviation, value);
    let (least, greatest) = (choice.window.least, choice.window.greatest.filter(|edge| edge.is_finite()));
    if fits.is_empty() || !least.is_finite() {
        return None;
    }
    let ends = fits.iter().flat_map(|fit| [fit.loosest, fit.tightest]).chain([least]).chain(greatest);
    let (low, high) = bounds(ends.map(on_axis));
    let air = 0.06 * (high - low);
    let rows = fits.len() as f64;
    let mut chart = Chart::new(
        Axis::new(low - air, high + air, 8, format!("interference, {}", units.unit(Measure::Deviation))),
        Axis { from: rows, to: 0.0, ticks: vec![], title: String::new() },
        rows * ROW + 76.0,
        Margins { left: 96.0, right: 34.0, top: 36.0, bottom: 40.0 },
    );
    let (left, right) = (on_axis(least), greatest.map_or(chart.x.to, on_axis));
    let empty = right < left;
    if !empty {
        chart.area(vec![(left, 0.0), (right, 0.0), (right, rows), (left, rows)]);
    }
    let least_name = format!("least {}", least_text(choice));
    chart.limit(
        (left, 0.0),
        (left, rows),
        least_name,
        (left, 0.0),
        if empty { Side::Right } else { Side::Left },
    );
    if let Some(greatest) = greatest {
        let name = format!("greatest {}", greatest_text(choice, greatest));
        chart.limit(
            (right, 0.0),
            (right, rows),
            name,
            (right, 0.0),
            if empty { Side::Left } else { Side::Right },
        );
    }
    for (row, fit) in fits.iter().enumerate() {
        let y = row as f64 + 0.5;
        let (from, to) = (on_axis(fit.loosest), on_axis(fit.tightest));
        chart.curve(vec![(from, y), (to, y)], Pen::solid(if fit.meets_all() { INK } else { RULE }, 2.4));
        chart.mark((from, y), Pair::Loosest);
        chart.mark((to, y), Pair::Tightest);
    }
    let caption = caption(choice, fits, units);
    let title = "Interference of the fits against what is allowed";
    let svg = chart.finish("plot-windows", title, &caption, |chart, sketch| {
        for (row, fit) in fits.iter().enumerate() {
            let (x, y) = chart.place((chart.x.from, row as f64 + 0.5));
            let colour = if fit.meets_all() { INK } else { QUIET };
            let mark = if fit.preferred_by.is_empty() { "" } else { " *" };
            let name = Lettering::new(format!("{}{mark}", fit.callout), TYPE).colour(colour);
            let name = if mark.is_empty() { name } else { name.bold() };
            sketch.text((x - 10.0, y + 0.35 * TYPE), &name.anchor(Anchor::End));
        }
    });
    Some(Plot { title: title.to_owned(), svg, caption })
}

/// The least interference, rounded into the band.
fn least_text(choice: &Choice) -> String {
    let system = choice.joint.display;
    format!("{} {}", words::rounded_up(choice.window.least, system), words::unit(system))
}

/// The greatest interference, rounded into the band.
fn greatest_text(choice: &Choice, greatest: f64) -> String {
    let system = choice.joint.display;
    format!("{} {}", words::rounded_down(greatest, system), words::unit(system))
}

fn caption(choice: &Choice, fits: &[&ChosenFit], units: Units) -> String {
    let band = match choice.window.greatest {
        Some(greatest) if greatest < choice.window.least => format!(
            "No interference is allowed: {} is the least that holds, {} the greatest that the other requirements leave.",
            least_text(choice),
            greatest_text(choice, greatest)
        ),
        Some(greatest) if greatest.is_finite() => format!(
            "The grey band is what is allowed: {} to {}.",
            least_text(choice),
            greatest_text(choice, greatest)
        ),
        _ => format!("The grey band is what is allowed: {} and more.", least_text(choice)),
    };
    let first = fits.first().map_or_else(String::new, |fit| {
        format!(
            " {} reaches from {} for its loosest pair to {} for its tightest.",
            fit.callout,
            units.text(Measure::Deviation, fit.loosest),
            units.text(Measure::Deviation, fit.tightest)
        )
    });
    format!(
        "{band}{first} The open mark is the loosest pair, the filled one the tightest. Fits preferred by a standard \
         carry a star."
    )
}
