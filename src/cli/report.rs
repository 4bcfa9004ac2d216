//! `hubgrip report`: the plotted report, one self-contained file.

use std::path::{Path, PathBuf};

use clap::Args;
use hubgrip::report::{html, terminal};

use super::check;
use super::exit::{Ending, Failure};
use super::input::{self, WhatIf};
use super::output::{Output, refuse_overwriting};

const EXAMPLE: &str = "\
Example:
  hubgrip report joint.yaml -o joint.html

The three answers are printed as well, unless --quiet is given.
A joint that misses a requirement gets its report as well; the exit code is then 1.";

/// The plotted report: one HTML file that needs no network and no script
#[derive(Debug, Args)]
#[command(after_help = EXAMPLE)]
pub struct Arguments {
    /// Joint file; - is standard input
    #[arg(value_name = "JOINT.yaml")]
    pub file: PathBuf,
    /// Where the report goes; - is standard output
    #[arg(long, short, value_name = "OUT.html")]
    pub output: Option<PathBuf>,
    /// Cautions that what was found calls for count as requirements not met; the
    /// usual ones of the method do not
    #[arg(long)]
    pub strict: bool,
    #[command(flatten)]
    pub what_if: WhatIf,
}

pub fn run(arguments: &Arguments, materials: Option<&Path>, output: &Output) -> Result<Ending, Failure> {
    refuse_overwriting("--output", arguments.output.as_deref(), [arguments.file.as_path()])?;
    let library = input::library(materials, output)?;
    let findings = input::findings(&arguments.file, &arguments.what_if.set, &library)?;
    let measured = input::measured(&findings.joint, &arguments.file);
    refuse_overwriting("--output", arguments.output.as_deref(), measured.iter().map(PathBuf::as_path))?;
    let page = html::html(&findings);
    match &arguments.output {
        Some(path) => output.page(path, &page, || terminal::summary(&findings))?,
        None => output.not_for_terminal(&page, "add -o OUT.html, or send it on with > or |")?,
    }
    Ok(check::ending(&findings, arguments.strict))
}
