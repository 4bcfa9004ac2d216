//! `hubgrip pressing`: recorded press-in curves.

use std::fs::{self, File};
use std::io::{self, BufReader, IsTerminal};
use std::path::{Path, PathBuf};

use clap::Args;
use hubgrip::diagnostic::Diagnostic;
use hubgrip::pressing::{self, Settings, Window};
use hubgrip::quantity::{Kind, parse};
use hubgrip::report::diagnostics;
use hubgrip::report::pressing::{self as report, Entry, Seen, Told};
use indicatif::{ProgressBar, ProgressDrawTarget, ProgressStyle};
use rayon::prelude::*;

use super::exit::{Ending, Failure};
use super::input::{self, WhatIf};
use super::number;
use super::output::{Output, refuse_overwriting};
use super::scatter::two_to_standard_output;

const EXAMPLE: &str = "\
Example:
  hubgrip pressing joint.yaml record.csv -o record.html
  hubgrip pressing joint.yaml records/ --json | jq '.records[] | .file, .ok'
  hubgrip pressing joint.yaml record.csv --touch-at 12.4mm --touch-within 0.5mm

A record is a CSV file with a header:
  travel (mm);force (kN)
  0.00;0.02
  0.25;0.31
The columns are found by their words (travel, position, stroke, displacement,
path; force, load), the unit stands behind the name. Comments begin with #. The
travel must not go back.

Exit codes:
  0  every record is within the joint's window
  1  some record is out
  2  some record cannot be read (the others are judged all the same), or bad
     input";

/// Judge recorded force-travel curves against the joint's window
#[derive(Debug, Args)]
#[command(after_help = EXAMPLE)]
pub struct Arguments {
    /// Joint file; - is standard input
    #[arg(value_name = "JOINT.yaml")]
    pub file: PathBuf,
    /// Records, or folders whose *.csv are taken; - is standard input
    #[arg(required = true, value_name = "RECORD.csv")]
    pub records: Vec<PathBuf>,
    /// A page with the curves over the window; - is standard output
    #[arg(long, short, value_name = "OUT.html")]
    pub output: Option<PathBuf>,
    /// The verdicts as JSON, fixed names, full precision
    #[arg(long)]
    pub json: bool,
    /// Travel of the record at which the parts are to touch
    #[arg(long, value_name = "LENGTH", default_value = "0 mm", allow_hyphen_values = true)]
    pub touch_at: String,
    /// How far the first touch may lie from there
    #[arg(long, value_name = "LENGTH", default_value = "1 mm", allow_hyphen_values = true)]
    pub touch_within: String,
    /// Uncertainty of the force, per cent of the reading
    #[arg(long, value_name = "PERCENT", default_value_t = 1.0, value_parser = number::per_cent, allow_negative_numbers = true)]
    pub force_uncertainty: f64,
    /// Greatest fall of the force, per cent of the peak
    #[arg(long, value_name = "PERCENT", default_value_t = 5.0, value_parser = number::per_cent, allow_negative_numbers = true)]
    pub drop: f64,
    /// Greatest ripple from trough to crest, per cent of the peak
    #[arg(long, value_name = "PERCENT", default_value_t = 5.0, value_parser = number::per_cent, allow_negative_numbers = true)]
    pub ripple: f64,
    /// Greatest ratio of the slope at the end to that at the beginning
    #[arg(long, value_name = "RATIO", default_value_t = 1.5, value_parser = number::plain, allow_negative_numbers = true)]
    pub steepening: f64,
    #[command(flatten)]
    pub what_if: WhatIf,
}

pub fn run(arguments: &Arguments, materials: Option<&Path>, output: &Output) -> Result<Ending, Failure> {
    let settings = settings(arguments)?;
    if arguments.json && arguments.output.as_deref().is_some_and(is_dash) {
        return Err(two_to_standard_output());
    }
    let inputs = arguments.records.iter().chain([&arguments.file]).map(PathBuf::as_path);
    refuse_overwriting("--output", arguments.output.as_deref(), inputs)?;
    let standard_input = arguments.records.iter().filter(|path| is_dash(path)).count();
    if standard_input + usize::from(is_dash(&arguments.file)) > 1 {
        return Err(Diagnostic::new("standard input can be read only once")
            .with_help("give `-` for the joint file or for one record")
            .into());
    }
    let library = input::library(materials, output)?;
    let findings = input::findings(&arguments.file, &arguments.what_if.set, &library)?;
    let window = Window::of(&findings).map_err(|error| {
        Diagnostic::new(error.to_string())
            .in_file(input::shown(&arguments.file))
            .with_help("`hubgrip check` shows the interference of its pairs")
    })?;
    let files = files(&arguments.records)?;
    refuse_overwriting("--output", arguments.output.as_deref(), files.iter().map(PathBuf::as_path))?;
    let entries = judged(&files, &window, &settings, output);
    if let [Entry { outcome: Err(fault), .. }] = entries.as_slice() {
        return Err(fault.clone().into());
    }
    for fault in entries.iter().filter_map(|entry| entry.outcome.as_ref().err()) {
        output.error(&if arguments.json { diagnostics::json(fault) } else { diagnostics::text(fault) });
    }
    let told = Told { findings: &findings, window: &window, settings: &settings, entries: &entries };
    match &arguments.output {
        Some(path) if arguments.json => {
            output.file(path, &report::html(&told))?;
            output.result(&report::json(&told))?;
        }
        Some(path) => output.page(path, &report::html(&told), || report::text(&told))?,
        None if arguments.json => output.result(&report::json(&told))?,
        None => output.result(&report::text(&told))?,
    }
    let count = report::count(&entries);
    Ok(match (count.unread, count.out) {
        (0, 0) => Ending::Met,
        (0, _) => Ending::NotMet,
        _ => Ending::NotRead,
    })
}

fn is_dash(path: &Path) -> bool {
    path == Path::new("-")
}

fn settings(arguments: &Arguments) -> Result<Settings, Failure> {
    let length = |option: &str, text: &str| {
        parse(Kind::Length, text).map_err(|error| {
            Failure::from(
                Diagnostic::new(format!("--{option} {text}: {error}"))
                    .with_help("write a length such as 0.5mm"),
            )
        })
    };
    let share = |option: &str, percent: f64| {
        if percent.is_finite() && (0.0..100.0).contains(&percent) {
            return Ok(percent / 100.0);
        }
        Err(Failure::from(
            Diagnostic::new(format!("--{option} {percent}: this is no share of a force"))
                .with_help("write per cent from 0 to below 100, such as 5"),
        ))
    };
    let touch_within = length("touch-within", &arguments.touch_within)?;
    if touch_within < 0.0 {
        return Err(Diagnostic::new("--touch-within is negative")
            .with_help("write a length such as 0.5mm")
            .into());
    }
    if !(arguments.steepening >= 1.0 && arguments.steepening.is_finite()) {
        return Err(Diagnostic::new(format!("--steepening {}: this is below 1", arguments.steepening))
            .with_help("write a ratio such as 1.5; its inverse is the least that is allowed")
            .into());
    }
    Ok(Settings {
        touch_at: length("touch-at", &arguments.touch_at)?,
        touch_within,
        force_uncertainty: share("force-uncertainty", arguments.force_uncertainty)?,
        drop: share("drop", arguments.drop)?,
        ripple: share("ripple", arguments.ripple)?,
        steepening: arguments.steepening,
    })
}

/// The records named, and those in the folders named, in order of name.
fn files(given: &[PathBuf]) -> Result<Vec<PathBuf>, Failure> {
    let mut files = Vec::new();
    for path in given {
        if !path.is_dir() {
            files.push(path.clone());
            continue;
        }
        let unreadable = |error: io::Error| Diagnostic::new(format!("cannot read: {error}")).in_file(path);
        let mut found = Vec::new();
        for entry in fs::read_dir(path).map_err(unreadable)? {
            let file = entry.map_err(unreadable)?.path();
            if file.extension().is_some_and(|extension| extension.eq_ignore_ascii_case("csv"))
                && file.is_file()
            {
                found.push(file);
            }
        }
        if found.is_empty() {
            return Err(Diagnostic::new("there is no record (*.csv) in this folder").in_file(path).into());
        }
        found.sort();
        files.extend(found);
    }
    Ok(files)
}

/// Every record judged, in the order given, whatever number of threads there is.
fn judged(files: &[PathBuf], window: &Window, settings: &Settings, output: &Output) -> Vec<Entry> {
    let bar = progress(files.len(), output);
    let entries = files
        .par_iter()
        .map(|path| {
            let shown = input::shown(path);
            let outcome = record(path).map(|record| Seen {
                judged: pressing::judge(window, &record, settings),
                columns: record.columns,
                rows: record.rows,
                greatest: record.greatest.0,
            });
            bar.inc(1);
            Entry {
                file: shown.display().to_string(),
                outcome: outcome.map_err(|fault| Box::new(fault.in_file(shown))),
            }
        })
        .collect();
    bar.finish_and_clear();
    entries
}

fn record(path: &Path) -> Result<pressing::Record, Box<Diagnostic>> {
    if is_dash(path) {
        return pressing::read(io::stdin().lock());
    }
    let file = File::open(path).map_err(|error| {
        Box::new(
            Diagnostic::new(format!("cannot read: {error}"))
                .with_help("name a record in CSV, or a folder of records"),
        )
    })?;
    pressing::read(BufReader::with_capacity(1 << 16, file))
}

/// A bar on standard error for many records, when it is a terminal and remarks are wanted.
fn progress(records: usize, output: &Output) -> ProgressBar {
    let shown = records > 1 && io::stderr().is_terminal() && !output.quiet();
    let target = if shown { ProgressDrawTarget::stderr() } else { ProgressDrawTarget::hidden() };
    let bar = ProgressBar::with_draw_target(Some(records as u64), target);
    if let Ok(style) = ProgressStyle::with_template("{bar:40} {pos} of {len} records") {
        bar.set_style(style);
    }
    bar
}
