//! `hubgrip scatter`: what the population of parts does.

use std::fs;
use std::io::{self, Read};
use std::path::{Path, PathBuf};

use clap::Args;
use hubgrip::diagnostic::Diagnostic;
use hubgrip::joint::Joint;
use hubgrip::population::distribution::measured::{self, Part};
use hubgrip::population::scatter::understood::{self, PopulationError, Understood};
use hubgrip::population::scatter::{ScatterError, Settings, scatter};
use hubgrip::quantity::Kind;
use hubgrip::report::scatter as report;

use super::exit::{Ending, Failure};
use super::input::{self, Source, WhatIf};
use super::number;
use super::output::{Output, refuse_overwriting};

const EXAMPLE: &str = "\
Example:
  hubgrip scatter joint.yaml
  hubgrip scatter joint.yaml -o population.html --samples 10000000 --seed 7
  hubgrip scatter joint.yaml --set population.hole.cp=1.33
  hubgrip scatter joint.yaml --json | jq '.slip[].ppm'

The joint file says how the parts scatter:
  population:
    hole: {cp: 1.33, cpk: 1.1, toward: upper}     normal by process capability
    shaft: {mean: 60.062 mm, sd: 3 um, truncated: limits}
    friction: {mean: 0.12, sd: 0.01, truncated: 0.09 to 0.15}
    hub_roughness: 6 to 10 um                     every value alike
    shaft: {measured: shafts.csv}                 a list of measured parts

Exit code 0: worked out, 1: the two engines do not agree, 2: bad input.";

/// What the population of parts does: probability of slip, of yield
#[derive(Debug, Args)]
#[command(after_help = EXAMPLE)]
pub struct Arguments {
    /// Joint file; - is standard input
    #[arg(value_name = "JOINT.yaml")]
    pub file: PathBuf,
    /// The population as JSON, fixed names, full precision
    #[arg(long)]
    pub json: bool,
    /// A page with histograms and tails; - is standard output
    #[arg(long, short, value_name = "OUT.html")]
    pub output: Option<PathBuf>,
    /// Random pairs
    #[arg(long, value_name = "N", default_value_t = 1_000_000, value_parser = number::whole, allow_negative_numbers = true)]
    pub samples: u64,
    /// Seed of the random pairs; the same seed gives the same bytes on any number of threads
    #[arg(long, value_name = "N", default_value_t = 1, value_parser = number::whole, allow_negative_numbers = true)]
    pub seed: u64,
    #[command(flatten)]
    pub what_if: WhatIf,
}

pub fn run(arguments: &Arguments, materials: Option<&Path>, output: &Output) -> Result<Ending, Failure> {
    if arguments.json && arguments.output.as_deref() == Some(Path::new("-")) {
        return Err(two_to_standard_output());
    }
    refuse_overwriting("--output", arguments.output.as_deref(), [arguments.file.as_path()])?;
    let library = input::library(materials, output)?;
    let source = Source::of(&arguments.file, &arguments.what_if)?;
    let joint = source.joint(&library)?;
    let measured = input::measured(&joint, &arguments.file);
    refuse_overwriting("--output", arguments.output.as_deref(), measured.iter().map(PathBuf::as_path))?;
    let Understood { model, assumed } = understood_of(&joint, &source)?;
    let settings =
        Settings { samples: arguments.samples, seed: arguments.seed, slip_safety: joint.require.slip_safety };
    let scatter = scatter(model, settings).map_err(|error| match error {
        ScatterError::Samples { .. } => {
            Diagnostic::new(format!("--samples: {error}")).with_help("the usual number is 1000000").into()
        }
        error => source.refused(error.to_string(), None, None),
    })?;
    let told = report::Told { joint: &joint, scatter: &scatter, assumed: &assumed };
    match &arguments.output {
        Some(path) if arguments.json => {
            output.file(path, &report::html(&told))?;
            output.result(&report::json(&told))?;
        }
        Some(path) => output.page(path, &report::html(&told), || report::text(&told))?,
        None if arguments.json => output.result(&report::json(&told))?,
        None => output.result(&report::text(&told))?,
    }
    Ok(if report::agrees(&scatter) { Ending::Met } else { Ending::NotMet })
}

/// The page and the JSON cannot share standard output.
pub fn two_to_standard_output() -> Failure {
    Diagnostic::new("the page (-o -) and the JSON (--json) would both go to standard output")
        .with_help("give the page a file, such as -o OUT.html, or leave one of the two out")
        .into()
}

/// What to do with a joint that the kernel does not take.
const INSTEAD: &str = "populations are worked out for two elastic rings of one section; judge the extreme pairs with `hubgrip check`, \
                       or a table of pairs with `hubgrip batch`";

/// The model of a joint; lists of measurements lie beside the joint file.
pub fn understood_of(joint: &Joint, source: &Source<'_>) -> Result<Understood, Failure> {
    let mut read = |name: &str, kind: Kind| {
        let parts = parts(&source.beside(name), kind)?;
        Ok(parts.into_iter().map(|part| part.value).collect())
    };
    understood::understood(joint, &mut read).map_err(|error| {
        let key = match &error {
            PopulationError::Measured(fault) => return fault.clone().into(),
            PopulationError::Kernel(error) => return source.refused_by_kernel(error, joint, INSTEAD),
            PopulationError::Distribution { key, .. }
            | PopulationError::OtherSize { key, .. }
            | PopulationError::TooManyValues { key, .. } => Some(*key),
            PopulationError::Scatter(
                ScatterError::ReachesZero { what } | ScatterError::FrictionAboveOne { what },
            ) => Some(*what),
            PopulationError::Scatter(_) => None,
        };
        let key = key.map(|key| format!("population.{key}"));
        source.refused(error.to_string(), key.as_deref(), None)
    })
}

/// The measured parts of a CSV file.
pub fn parts(path: &Path, kind: Kind) -> Result<Vec<Part>, Box<Diagnostic>> {
    let refused = |message: &str, help: &str| {
        Box::new(Diagnostic::new(message).in_file(input::shown(path)).with_help(help))
    };
    let bytes = if path == Path::new("-") {
        let mut bytes = Vec::new();
        io::stdin().lock().read_to_end(&mut bytes).map(|_| bytes)
    } else if path.is_dir() {
        return Err(refused("this is a folder, not a list of measurements", "name a CSV file in it"));
    } else {
        fs::read(path)
    };
    let bytes = bytes.map_err(|error| {
        refused(
            &format!("cannot read: {error}"),
            "a list of measurements is a CSV file; one that the joint file names lies beside it",
        )
    })?;
    let text = String::from_utf8(bytes)
        .map_err(|_| refused("this is not text in UTF-8", "save the list as CSV in UTF-8"))?;
    measured::read(&text, kind).map_err(|fault| Box::new(fault.in_file(input::shown(path))))
}
