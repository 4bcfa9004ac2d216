//! `hubgrip choose`: the standard fits that meet the requirements, ranked.

use std::io::{self, IsTerminal};
use std::path::{Path, PathBuf};

use clap::{Args, ValueEnum};
use hubgrip::assembly::bearing_tables::BearingRing;
use hubgrip::diagnostic::Diagnostic;
use hubgrip::joint::Joint;
use hubgrip::population::choose::{Choice, ChooseError, Options, Standard, choose_telling};
use hubgrip::population::kernel::KernelError;
use hubgrip::quantity::UnitSystem;
use hubgrip::report::choose as report;
use hubgrip::tolerance::iso286::Grade;
use indicatif::{ProgressBar, ProgressStyle};

use super::exit::{Ending, Failure};
use super::input::{self, Source, WhatIf};
use super::output::{Output, refuse_overwriting};

const EXAMPLE: &str = "\
Example:
  hubgrip choose joint.yaml
  hubgrip choose joint.yaml --finest 6 --set require.press_force=100kN
  hubgrip choose joint.yaml -o choice.html
  hubgrip choose joint.yaml --json | jq -r '.fits[].fit'

The joint file needs no fit; one that it has is judged as well. It must state a
load, such as duty: [{state: rated, torque: 900 N.m}]. Beside `bearing:` the
classes of the other part are gone through. A required handling_time is followed
for each fit, which takes seconds; --finest 6 takes less.

Exit code 0: some fit, 1: none is left, 2: bad input.";

/// Which standard fits meet the requirements, the cheapest first
#[derive(Debug, Args)]
#[command(after_help = EXAMPLE)]
pub struct Arguments {
    /// Joint file; - is standard input
    #[arg(value_name = "JOINT.yaml")]
    pub file: PathBuf,
    /// Every fit with its margins as JSON, fixed names, full precision
    #[arg(long)]
    pub json: bool,
    /// A page with the list and the picture of the interferences; - is standard output
    #[arg(long, short, value_name = "OUT.html", conflicts_with = "json")]
    pub output: Option<PathBuf>,
    /// Standard; without it ISO 286, or ANSI B4.1 when the joint file says display: inch
    #[arg(long, value_enum)]
    pub standard: Option<StandardName>,
    /// Finest grade of ISO 286 to choose from, such as 6; without it all, down to IT01
    #[arg(long, value_name = "GRADE", value_parser = grade, allow_negative_numbers = true)]
    pub finest: Option<Grade>,
    /// List every fit, mixed ones too
    #[arg(long)]
    pub all: bool,
    #[command(flatten)]
    pub what_if: WhatIf,
}

/// Standard.
#[derive(Debug, Clone, Copy, PartialEq, Eq, ValueEnum)]
pub enum StandardName {
    Iso,
    Ansi,
}

fn grade(text: &str) -> Result<Grade, String> {
    let number = text.trim_start_matches("IT").trim_start_matches("it");
    Grade::from_name(number).ok_or_else(|| "grades are 01, 0 and 1 to 18".to_owned())
}

pub fn run(arguments: &Arguments, materials: Option<&Path>, output: &Output) -> Result<Ending, Failure> {
    refuse_overwriting("--output", arguments.output.as_deref(), [arguments.file.as_path()])?;
    let library = input::library(materials, output)?;
    let source = Source::of(&arguments.file, &arguments.what_if)?;
    let joint = source.joint_without_fit(&library)?;
    let measured = input::measured(&joint, &arguments.file);
    refuse_overwriting("--output", arguments.output.as_deref(), measured.iter().map(PathBuf::as_path))?;
    let standard = match arguments.standard {
        Some(StandardName::Iso) => Standard::Iso286,
        Some(StandardName::Ansi) => Standard::AnsiB4_1,
        None if joint.display == UnitSystem::Inch && joint.bearing.is_none() => Standard::AnsiB4_1,
        None => Standard::Iso286,
    };
    if standard == Standard::AnsiB4_1 && arguments.finest.is_some() && joint.bearing.is_none() {
        return Err(Diagnostic::new(
            "--finest names a grade of ISO 286, and the fits are those of ANSI B4.1",
        )
        .with_help("add --standard iso, or leave --finest out")
        .into());
    }
    let options = Options { standard, finest: arguments.finest };
    let bar = bar(output);
    let progress = |done: usize, all: usize| {
        bar.set_length(all as u64);
        bar.set_position(done as u64);
    };
    let choice = choose_telling(joint.clone(), options, &progress);
    bar.finish_and_clear();
    let choice = choice.map_err(|error| refused(&error, &joint, &source))?;
    match &arguments.output {
        Some(path) => {
            let page = report::html(&choice, arguments.all);
            output.page(path, &page, || report::text(&choice, arguments.all))?;
        }
        None if arguments.json => output.result(&report::to_json(&choice))?,
        None => output.result(&report::text(&choice, arguments.all))?,
    }
    Ok(ending(&choice))
}

/// A bar on standard error while times are worked out fit by fit, when it is a terminal and remarks are wanted.
fn bar(output: &Output) -> ProgressBar {
    if output.quiet() || !io::stderr().is_terminal() {
        return ProgressBar::hidden();
    }
    let bar = ProgressBar::no_length();
    match ProgressStyle::with_template("{bar:40} {pos} of {len} tightest pairs followed, {eta} left") {
        Ok(style) => bar.with_style(style),
        Err(_) => bar,
    }
}

fn ending(choice: &Choice) -> Ending {
    if choice.fits.is_empty() { Ending::NotMet } else { Ending::Met }
}

fn refused(error: &ChooseError, joint: &Joint, source: &Source<'_>) -> Failure {
    match error {
        ChooseError::Kernel(error) => {
            let instead = match error {
                KernelError::NotTwoRings(_) => {
                    "choose works out two parts, shaft and hub; try fits of these rings with \
                     `hubgrip check JOINT.yaml --set fits.0=H7/s6`"
                }
                KernelError::Stepped => {
                    "choose for one section in place of the steps, then judge that fit on them with \
                     `hubgrip check JOINT.yaml --set fit=H7/s6`"
                }
                _ => {
                    "leave it out to choose an elastic fit, or try tighter ones with \
                     `hubgrip check JOINT.yaml --set fit=H7/u6`"
                }
            };
            source.refused_by_kernel(error, joint, instead)
        }
        ChooseError::NoLoad => {
            let state = match joint.bearing {
                Some(_) => "duty: [{state: rated, radial_force: 4 kN}]",
                None => "duty: [{state: rated, torque: 900 N.m}]",
            };
            source.refused(error.to_string(), Some("duty"), Some(format!("give a load, such as `{state}`")))
        }
        ChooseError::Tolerance(tolerance) => {
            source.refused(error.to_string(), Some("diameter"), tolerance.help())
        }
        ChooseError::RingByIso => source.refused(
            error.to_string(),
            joint.bearing.as_ref().map(|seat| match seat.ring {
                BearingRing::Inner => "hub.bearing",
                BearingRing::Outer => "shaft.bearing",
            }),
            Some("leave --standard ansi out".to_owned()),
        ),
    }
}
