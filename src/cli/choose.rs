//! `hubgrip choose`: the standard fits that meet the requirements, ranked.

use std::path::{Path, PathBuf};

use clap::{Args, ValueEnum};
use hubgrip::diagnostic::Diagnostic;
use hubgrip::population::choose::{Choice, ChooseError, Options, Standard, choose};
use hubgrip::quantity::UnitSystem;
use hubgrip::report::choose as report;
use hubgrip::tolerance::iso286::Grade;

use super::exit::{Ending, Failure};
use super::input::{self, WhatIf};
use super::output::Output;

const EXAMPLE: &str = "\
Example:
  hubgrip choose joint.yaml
  hubgrip choose joint.yaml --finest 6 --set require.press_force=100kN
  hubgrip choose joint.yaml -o choice.html
  hubgrip choose joint.yaml --json | jq -r '.fits[].fit'

The joint file needs no fit; one that it has is judged as well. It must state a load,
such as duty: [{state: rated, torque: 900 N.m}]. The exit code is 1 when no fit is left.";

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
    #[arg(long, value_name = "GRADE", value_parser = grade)]
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
    /// ISO 286
    Iso,
    /// ANSI B4.1
    Ansi,
}

fn grade(text: &str) -> Result<Grade, String> {
    let number = text.trim_start_matches("IT").trim_start_matches("it");
    Grade::from_name(number).ok_or_else(|| "grades are 01, 0 and 1 to 18".to_owned())
}

pub fn run(arguments: &Arguments, materials: Option<&Path>, output: &Output) -> Result<Ending, Failure> {
    let library = input::library(materials, output)?;
    let joint = input::joint_without_fit(&arguments.file, &arguments.what_if.set, &library)?;
    let standard = match arguments.standard {
        Some(StandardName::Iso) => Standard::Iso286,
        Some(StandardName::Ansi) => Standard::AnsiB4_1,
        None if joint.display == UnitSystem::Inch => Standard::AnsiB4_1,
        None => Standard::Iso286,
    };
    if standard == Standard::AnsiB4_1 && arguments.finest.is_some() {
        return Err(Diagnostic::new(
            "--finest names a grade of ISO 286, and the fits are those of ANSI B4.1",
        )
        .with_help("add --standard iso, or leave --finest out")
        .into());
    }
    let options = Options { standard, finest: arguments.finest };
    let choice = choose(joint, options).map_err(|error| refused(&error, &arguments.file))?;
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

fn ending(choice: &Choice) -> Ending {
    if choice.fits.is_empty() { Ending::NotMet } else { Ending::Met }
}

fn refused(error: &ChooseError, file: &Path) -> Failure {
    let diagnostic = Diagnostic::new(error.to_string()).in_file(input::shown(file));
    let help = match error {
        ChooseError::NoLoad => {
            Some("add a state, such as `duty: [{state: rated, torque: 900 N.m}]`".to_owned())
        }
        ChooseError::Tolerance(error) => error.help(),
        _ => None,
    };
    match help {
        Some(help) => diagnostic.with_help(help).into(),
        None => diagnostic.into(),
    }
}
