//! `hubgrip sort`: selective assembly.

use std::path::{Path, PathBuf};

use clap::{Args, ValueEnum};
use hubgrip::diagnostic::Diagnostic;
use hubgrip::joint::Joint;
use hubgrip::joint::population::Variation;
use hubgrip::material::Range;
use hubgrip::population::distribution::Distribution;
use hubgrip::population::distribution::measured::Part;
use hubgrip::population::scatter::understood::{is_of_another_joint, limits};
use hubgrip::population::sort::groups::{Grouping, Lots};
use hubgrip::population::sort::matching::greatest_matching;
use hubgrip::population::sort::{MOST_GROUPS, required_band};
use hubgrip::quantity::{Kind, parse_range, written};
use hubgrip::report::sort as report;
use hubgrip::tolerance::Member;

use super::exit::{Ending, Failure};
use super::input::{self, Source, WhatIf};
use super::number;
use super::output::{Output, refuse_overwriting};
use super::scatter::{parts, understood_of};

const EXAMPLE: &str = "\
Example:
  hubgrip sort joint.yaml --groups 4 --band \"30 to 45 um\"
  hubgrip sort joint.yaml --groups 3 --by share
  hubgrip sort joint.yaml --holes holes.csv --shafts shafts.csv \\
    --band \"30 to 40 um\" --pick-list pairs.csv

Without --band the band is what the requirements of the joint file allow. A list
of measured parts is a CSV file with a column diameter_mm (or diameter, with the
unit behind each number) and, if wanted, a column part.

Exit code 0: every pair of a group is in the band, 1: some may leave it, 2: bad
input.";

/// Selective assembly: grouping parts so that a coarse tolerance gives a fine fit
#[derive(Debug, Args)]
#[command(after_help = EXAMPLE)]
pub struct Arguments {
    /// Joint file; - is standard input
    #[arg(value_name = "JOINT.yaml")]
    pub file: PathBuf,
    /// Number of groups; without it the fewest that keep every pair within the band
    #[arg(long, value_name = "N", value_parser = number::whole, allow_negative_numbers = true)]
    pub groups: Option<u64>,
    /// Limits of the groups: of equal width, or with equal shares of the parts
    #[arg(long, value_enum, default_value_t = By::Width)]
    pub by: By,
    /// Wanted interference, such as "30 to 45 um"; without it what the requirements allow
    #[arg(long, value_name = "RANGE", allow_hyphen_values = true)]
    pub band: Option<String>,
    /// Measured holes, CSV; - is standard input
    #[arg(long, value_name = "HOLES.csv")]
    pub holes: Option<PathBuf>,
    /// Measured shafts, CSV; - is standard input
    #[arg(long, value_name = "SHAFTS.csv")]
    pub shafts: Option<PathBuf>,
    /// Pick list of the measured parts, CSV; - is standard output
    #[arg(long, value_name = "OUT.csv")]
    pub pick_list: Option<PathBuf>,
    /// The groups as JSON, fixed names, full precision
    #[arg(long)]
    pub json: bool,
    #[command(flatten)]
    pub what_if: WhatIf,
}

/// How the limits of the groups are set.
#[derive(Debug, Clone, Copy, PartialEq, Eq, ValueEnum)]
pub enum By {
    Width,
    Share,
}

pub fn run(arguments: &Arguments, materials: Option<&Path>, output: &Output) -> Result<Ending, Failure> {
    refuse_lost_streams(arguments)?;
    let library = input::library(materials, output)?;
    let source = Source::of(&arguments.file, &arguments.what_if)?;
    let joint = source.joint(&library)?;
    let measured = input::measured(&joint, &arguments.file);
    refuse_overwriting("--pick-list", arguments.pick_list.as_deref(), measured.iter().map(PathBuf::as_path))?;
    let shown = input::shown(&arguments.file);
    let refused = |message: String| Failure::from(Diagnostic::new(message).in_file(&shown));
    let holes = list(arguments.holes.as_deref(), joint.population.hole.as_ref(), &source, joint.diameter)?;
    let shafts = list(arguments.shafts.as_deref(), joint.population.shaft.as_ref(), &source, joint.diameter)?;
    let understood = understood_of(&joint, &source)?;
    let population = &understood.model.population;
    let of = |parts: &Option<Vec<Part>>, plan: &Distribution| match parts {
        Some(parts) => {
            let sizes: Vec<f64> = parts.iter().map(|part| part.value - joint.diameter).collect();
            Distribution::measured(&sizes).map_err(|error| refused(error.to_string()))
        }
        None => Ok(plan.clone()),
    };
    let lots = Lots {
        holes: of(&holes, &population.hole)?,
        shafts: of(&shafts, &population.shaft)?,
        hole: limits(&joint, Member::Hole),
        shaft: limits(&joint, Member::Shaft),
    };
    let (band, band_source) = band(arguments.band.as_deref(), &joint, &source)?;
    let fewest = lots.fewest(band);
    let grouping = match arguments.by {
        By::Width => Grouping::EqualWidth,
        By::Share => Grouping::EqualShare,
    };
    let count = match (arguments.groups, fewest) {
        (Some(count), _) => groups_of(count)?,
        (None, Some(count)) => count,
        (None, None) => {
            return Err(Diagnostic::new("no number of groups brings every pair into the band")
                .with_help("give --groups N, or a wider --band")
                .into());
        }
    };
    let groups = lots.sorted(count, grouping, band).map_err(|error| refused(error.to_string()))?;
    let pairs = match (&holes, &shafts) {
        (Some(holes), Some(shafts)) => {
            let sizes = |parts: &[Part]| parts.iter().map(|part| part.value).collect::<Vec<f64>>();
            greatest_matching(&sizes(holes), &sizes(shafts), band)
        }
        _ => Vec::new(),
    };
    let measured = match (&holes, &shafts) {
        (Some(holes), Some(shafts)) => Some(report::Lots { holes, shafts, pairs: &pairs }),
        _ => None,
    };
    let assumed: Vec<String> = understood
        .assumed
        .into_iter()
        .filter(|sentence| {
            (holes.is_none() && sentence.starts_with("population.hole"))
                || (shafts.is_none() && sentence.starts_with("population.shaft "))
        })
        .collect();
    let sorted = report::Sorted {
        joint: &joint,
        groups: &groups,
        grouping,
        fewest,
        band_source,
        lots: measured,
        assumed: &assumed,
    };
    if let Some(path) = &arguments.pick_list {
        let Some(lots) = &sorted.lots else {
            return Err(Diagnostic::new("a pick list needs measured holes and measured shafts")
                .with_help("give --holes HOLES.csv and --shafts SHAFTS.csv")
                .into());
        };
        let text = report::pick_list(lots).map_err(|error| Diagnostic::new(error.to_string()))?;
        output.file(path, &text)?;
        if path.as_os_str() == "-" {
            return Ok(ending(groups.all_within()));
        }
    }
    output.result(&if arguments.json { report::json(&sorted) } else { report::text(&sorted) })?;
    Ok(ending(groups.all_within()))
}

/// The number of groups asked for.
fn groups_of(count: u64) -> Result<usize, Failure> {
    usize::try_from(count).ok().filter(|count| (1..=MOST_GROUPS).contains(count)).ok_or_else(|| {
        Diagnostic::new(format!("--groups {count}: {count} groups are not possible"))
            .with_help(format!("write 1 to {MOST_GROUPS}, or leave --groups out for the fewest that do"))
            .into()
    })
}

/// Standard input can be read once, standard output holds one thing, and no input is written over.
fn refuse_lost_streams(arguments: &Arguments) -> Result<(), Failure> {
    let is_dash = |path: &Path| path == Path::new("-");
    let inputs = || {
        let lists = [arguments.holes.as_deref(), arguments.shafts.as_deref()];
        std::iter::once(arguments.file.as_path()).chain(lists.into_iter().flatten())
    };
    if inputs().filter(|path| is_dash(path)).count() > 1 {
        return Err(Diagnostic::new("standard input can be read only once")
            .with_help("give `-` for one of joint file, holes and shafts")
            .into());
    }
    if arguments.json && arguments.pick_list.as_deref().is_some_and(is_dash) {
        return Err(Diagnostic::new(
            "the pick list (--pick-list -) and the JSON (--json) would both go to standard output",
        )
        .with_help("give the pick list a file, such as --pick-list OUT.csv, or leave one of the two out")
        .into());
    }
    refuse_overwriting("--pick-list", arguments.pick_list.as_deref(), inputs())
}

fn ending(within: bool) -> Ending {
    if within { Ending::Met } else { Ending::NotMet }
}

/// The measured parts named on the command line, else those of the joint file.
fn list(
    given: Option<&Path>,
    plan: Option<&Variation>,
    source: &Source<'_>,
    nominal: f64,
) -> Result<Option<Vec<Part>>, Failure> {
    let path = match (given, plan) {
        (Some(path), _) => path.to_path_buf(),
        (None, Some(Variation::Measured(name))) => source.beside(name),
        _ => return Ok(None),
    };
    let parts = parts(&path, Kind::Length)?;
    if let Some(part) = parts.iter().find(|part| is_of_another_joint(part.value, nominal)) {
        let text = |size| written(Kind::Length, size);
        return Err(Diagnostic::new(format!(
            "part {}: {} is more than 5 % off the diameter of the joint, {}",
            part.name,
            text(part.value),
            text(nominal)
        ))
        .in_file(input::shown(&path))
        .with_help("write whole sizes, not deviations, and check the unit in the first row")
        .into());
    }
    Ok(Some(parts))
}

/// The wanted band, m, with where it comes from.
fn band(given: Option<&str>, joint: &Joint, source: &Source<'_>) -> Result<(Range, &'static str), Failure> {
    if let Some(text) = given {
        let (low, high) = parse_range(Kind::Length, text).map_err(|error| {
            Diagnostic::new(format!("--band {text}: {error}"))
                .with_help("write a range such as \"30 to 45 um\"")
        })?;
        if low >= high {
            return Err(Diagnostic::new(format!("--band {text}: this is one value"))
                .with_help("write a range such as \"30 to 45 um\"")
                .into());
        }
        return Ok((Range { low, high }, "as given"));
    }
    let (low, high) = required_band(joint).map_err(|error| source.refused(error.to_string(), None, None))?;
    let tightest = joint.fits.first().map_or(0.0, |fit| fit.limits.interference().tightest);
    let low = low.unwrap_or(0.0);
    let high = high.unwrap_or(tightest);
    if low >= high {
        let help = "give --band, or change the joint: `hubgrip choose` says what blocks";
        let fault = "no interference meets all requirements of the joint file";
        return Err(source.refused(fault, None, Some(help.to_owned())));
    }
    let timed = joint.assembly.practice.time_needed().is_some();
    let named = if timed && (joint.assembly.heats() || joint.assembly.chills()) {
        "from the requirements of the joint file without its handling time"
    } else {
        "from the requirements of the joint file"
    };
    Ok((Range { low, high }, named))
}
