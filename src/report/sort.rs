//! Selective assembly as text, as JSON, and as pick lists in CSV.

use std::fmt::Write;

use serde_json::json;

use super::terminal::{WIDTH, plain};
use crate::joint::Joint;
use crate::material::Range;
use crate::population::distribution::measured::Part;
use crate::population::sort::groups::{Grouping, Groups};
use crate::population::sort::matching::Pair;
use crate::quantity::{Measure, UnitSystem, number, show};
use crate::tolerance::Limits;

/// Groups with what they were made from.
#[derive(Debug, Clone, Copy)]
pub struct Sorted<'a> {
    /// The joint.
    pub joint: &'a Joint,
    /// The groups.
    pub groups: &'a Groups,
    /// How their limits were set.
    pub grouping: Grouping,
    /// Fewest groups of equal width of which every pair lies within the band.
    pub fewest: Option<usize>,
    /// Where the band comes from.
    pub band_source: &'a str,
    /// The measured lots, when both are.
    pub lots: Option<Lots<'a>>,
    /// What was assumed; full sentences.
    pub assumed: &'a [String],
}

/// Measured holes and shafts with their pairs.
#[derive(Debug, Clone, Copy)]
pub struct Lots<'a> {
    /// Holes.
    pub holes: &'a [Part],
    /// Shafts.
    pub shafts: &'a [Part],
    /// Pairs within the band, as many as can be made.
    pub pairs: &'a [Pair],
}

/// The groups as text for a terminal.
pub fn text(sorted: &Sorted<'_>) -> String {
    let mut out = String::new();
    let (joint, groups) = (sorted.joint, sorted.groups);
    let system = joint.display;
    let name = if joint.title.is_empty() { "Joint" } else { &joint.title };
    paragraph(&mut out, &plain(name));
    let callout = joint.fits.first().map_or("", |fit| fit.callout.as_str());
    let how = match sorted.grouping {
        Grouping::EqualWidth => "equal width",
        Grouping::EqualShare => "equal share",
    };
    paragraph(
        &mut out,
        &format!(
            "{}  {callout}: {} groups of {how}, wanted interference {} ({})",
            show(Measure::Size, joint.diameter, system),
            groups.groups.len(),
            band(groups.band, system),
            sorted.band_source
        ),
    );
    line(&mut out, "");
    table(&mut out, sorted);
    line(&mut out, "");
    summary(&mut out, sorted);
    if let Some(lots) = &sorted.lots {
        line(&mut out, "");
        paragraph(&mut out, &pairs_text(lots, groups.band, system));
    }
    for sentence in sorted.assumed {
        paragraph(&mut out, &format!("- {sentence}"));
    }
    out
}

fn table(out: &mut String, sorted: &Sorted<'_>) {
    let groups = sorted.groups;
    let system = sorted.joint.display;
    let unit = show(Measure::Deviation, 0.0, system).unit;
    let deviation = |value: f64| show(Measure::Deviation, value, system).number;
    let limits = |limits: Limits| format!("{} to {}", deviation(limits.lower), deviation(limits.upper));
    line(
        out,
        format!(
            "{:>2} {:>14} {:>14} {:>7} {:>7} {:>8} {:>14} {:>7}",
            "",
            format!("holes, {unit}"),
            format!("shafts, {unit}"),
            "holes",
            "shafts",
            "surplus",
            "interference",
            "in band"
        ),
    );
    for (number, group) in groups.groups.iter().enumerate() {
        let percent = |share: f64| format!("{:.1} %", 100.0 * share);
        let surplus = match group.surplus() {
            surplus if surplus.abs() < 5e-4 => "none".to_owned(),
            surplus if surplus > 0.0 => format!("{} h", percent(surplus)),
            surplus => format!("{} s", percent(-surplus)),
        };
        line(
            out,
            format!(
                "{:>2} {:>14} {:>14} {:>7} {:>7} {:>8} {:>14} {:>7}",
                number + 1,
                limits(group.hole),
                limits(group.shaft),
                percent(group.hole_share),
                percent(group.shaft_share),
                surplus,
                format!("{} to {}", deviation(group.interference.low), deviation(group.interference.high)),
                percent(group.within)
            ),
        );
    }
}

fn summary(out: &mut String, sorted: &Sorted<'_>) {
    let groups = sorted.groups;
    let percent = |share: f64| format!("{:.2} %", 100.0 * share);
    paragraph(
        out,
        &format!(
            "Of as many holes as shafts {} find a mate in their group; {} do so within the band. Paired at random, unsorted, \
             {} of the pairs are within the band.",
            percent(groups.mates()),
            percent(groups.within()),
            percent(groups.unsorted)
        ),
    );
    if groups.holes_outside > 5e-7 || groups.shafts_outside > 5e-7 {
        paragraph(
            out,
            &format!(
                "Outside their limits, in no group: {} of the holes, {} of the shafts.",
                percent(groups.holes_outside),
                percent(groups.shafts_outside)
            ),
        );
    }
    let told = match sorted.fewest {
        Some(count) => format!("Fewest groups of equal width of which every pair lies within the band: {count}."),
        None => "No number of groups of equal width brings every pair into the band: its middle does not fit the limits."
            .to_owned(),
    };
    paragraph(out, &told);
}

fn pairs_text(lots: &Lots<'_>, wanted: Range, system: UnitSystem) -> String {
    let pairs = lots.pairs.len();
    format!(
        "Matched one by one: {pairs} pairs within {}, the most that {} holes and {} shafts can make; {} holes and {} shafts are left.",
        band(wanted, system),
        lots.holes.len(),
        lots.shafts.len(),
        lots.holes.len() - pairs,
        lots.shafts.len() - pairs
    )
}

fn band(band: Range, system: UnitSystem) -> String {
    let high = show(Measure::Deviation, band.high, system);
    format!("{} to {high}", show(Measure::Deviation, band.low, system).number)
}

/// The groups as JSON: fixed names, full precision, units in the names.
pub fn json(sorted: &Sorted<'_>) -> String {
    let groups = sorted.groups;
    let um = |value: f64| value * 1e6;
    let value = json!({
        "sort": 1,
        "title": sorted.joint.title,
        "input_sha256": sorted.joint.digest,
        "band": {"low_um": um(groups.band.low), "high_um": um(groups.band.high), "source": sorted.band_source},
        "by": match sorted.grouping { Grouping::EqualWidth => "width", Grouping::EqualShare => "share" },
        "groups": groups.groups.iter().map(|group| json!({
            "hole": {"lower_um": um(group.hole.lower), "upper_um": um(group.hole.upper)},
            "shaft": {"lower_um": um(group.shaft.lower), "upper_um": um(group.shaft.upper)},
            "hole_share": group.hole_share,
            "shaft_share": group.shaft_share,
            "mates": group.mates(),
            "surplus": group.surplus(),
            "interference_low_um": um(group.interference.low),
            "interference_high_um": um(group.interference.high),
            "within_band": group.within,
        })).collect::<Vec<_>>(),
        "mates": groups.mates(),
        "mates_within_band": groups.within(),
        "unsorted_within_band": groups.unsorted,
        "holes_outside": groups.holes_outside,
        "shafts_outside": groups.shafts_outside,
        "fewest_groups": sorted.fewest,
        "matching": sorted.lots.as_ref().map(|lots| json!({
            "holes": lots.holes.len(),
            "shafts": lots.shafts.len(),
            "pairs": lots.pairs.iter().map(|pair| pair_json(lots, *pair)).collect::<Vec<_>>(),
        })),
        "assumed": sorted.assumed,
    });
    let mut text = serde_json::to_string_pretty(&value).unwrap_or_default();
    text.push('\n');
    text
}

fn pair_json(lots: &Lots<'_>, pair: Pair) -> serde_json::Value {
    match (lots.holes.get(pair.hole), lots.shafts.get(pair.shaft)) {
        (Some(hole), Some(shaft)) => json!({
            "hole": hole.name,
            "shaft": shaft.name,
            "interference_um": (shaft.value - hole.value) * 1e6,
        }),
        _ => serde_json::Value::Null,
    }
}

/// The pick list as CSV: the pairs in order of size, then what is left, without a mate.
///
/// # Errors
/// The table cannot be written, which memory does not refuse.
pub fn pick_list(lots: &Lots<'_>) -> Result<String, csv::Error> {
    let mut table = csv::Writer::from_writer(Vec::new());
    table.write_record(["pair", "hole", "hole_mm", "shaft", "shaft_mm", "interference_um"])?;
    let size = |part: &Part| number(part.value * 1e3, 12);
    let (mut free_holes, mut free_shafts) = (vec![true; lots.holes.len()], vec![true; lots.shafts.len()]);
    for (place, pair) in lots.pairs.iter().enumerate() {
        let (Some(hole), Some(shaft)) = (lots.holes.get(pair.hole), lots.shafts.get(pair.shaft)) else {
            continue;
        };
        (free_holes[pair.hole], free_shafts[pair.shaft]) = (false, false);
        let mut interference = String::new();
        let _ = write!(interference, "{}", number((shaft.value - hole.value) * 1e6, 6));
        table.write_record([
            (place + 1).to_string(),
            hole.name.clone(),
            size(hole),
            shaft.name.clone(),
            size(shaft),
            interference,
        ])?;
    }
    let nothing = String::new;
    for hole in lots.holes.iter().zip(&free_holes).filter(|(_, free)| **free).map(|(hole, _)| hole) {
        table.write_record([nothing(), hole.name.clone(), size(hole), nothing(), nothing(), nothing()])?;
    }
    for shaft in lots.shafts.iter().zip(&free_shafts).filter(|(_, free)| **free).map(|(shaft, _)| shaft) {
        table.write_record([nothing(), nothing(), nothing(), shaft.name.clone(), size(shaft), nothing()])?;
    }
    let bytes = table.into_inner().map_err(|error| error.into_error())?;
    Ok(String::from_utf8_lossy(&bytes).into_owned())
}

fn line(out: &mut String, text: impl AsRef<str>) {
    out.push_str(text.as_ref().trim_end());
    out.push('\n');
}

fn paragraph(out: &mut String, text: &str) {
    for wrapped in
        textwrap::wrap(text, textwrap::Options::new(WIDTH).subsequent_indent("  ").break_words(false))
    {
        line(out, wrapped);
    }
}
