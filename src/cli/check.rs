//! `hubgrip check`: findings on the terminal.

use std::path::{Path, PathBuf};

use clap::Args;
use hubgrip::findings::Findings;
use hubgrip::report::{json, terminal};

use super::exit::{Ending, Failure};
use super::input::{self, WhatIf};
use super::output::Output;

const EXAMPLE: &str = "\
Example:
  hubgrip check joint.yaml
  hubgrip check joint.yaml --set fit=H7/u6 --set hub.outer_diameter=120mm
  hubgrip check hub.yaml rim.yaml
  hubgrip check --json joint.yaml | jq '.extremes.tightest.pressure_mpa'";

/// Does it hold, does it keep its strength, how is it assembled
#[derive(Debug, Args)]
#[command(after_help = EXAMPLE)]
pub struct Arguments {
    /// Joint files; - is standard input
    #[arg(required = true, value_name = "JOINT.yaml")]
    pub files: Vec<PathBuf>,
    /// Findings as JSON, fixed names, full precision
    #[arg(long)]
    pub json: bool,
    /// Cautions that what was found calls for count as requirements not met; the
    /// usual ones of the method do not
    #[arg(long)]
    pub strict: bool,
    #[command(flatten)]
    pub what_if: WhatIf,
}

pub fn run(arguments: &Arguments, materials: Option<&Path>, output: &Output) -> Result<Ending, Failure> {
    let library = input::library(materials, output)?;
    let mut worst = Ending::Met;
    let mut all = Vec::new();
    for file in &arguments.files {
        all.push((shown(file), input::findings(file, &arguments.what_if.set, &library)?));
    }
    let several = all.len() > 1;
    for (index, (file, findings)) in all.iter().enumerate() {
        let text = match (arguments.json, several) {
            (true, false) => json::to_json(findings),
            (true, true) => json::to_json_of(file, findings),
            (false, false) => terminal::text(findings),
            (false, true) => {
                let gap = if index > 0 { "\n" } else { "" };
                format!("{gap}{file}:\n{}", terminal::text(findings))
            }
        };
        output.result(&text)?;
        worst = worst.max(ending(findings, arguments.strict));
    }
    Ok(worst)
}

/// The name of a file on one line, without signs that steer a terminal.
fn shown(file: &Path) -> String {
    let name = input::shown(file).display().to_string();
    name.chars().map(|sign| if sign.is_control() { ' ' } else { sign }).collect()
}

/// Whether all requirements are met; when the check is strict, cautions count that what was found calls for.
pub fn ending(findings: &Findings, strict: bool) -> Ending {
    let cautioned = findings.cautions.iter().any(|caution| !caution.usual);
    let met = findings.verdicts.iter().all(|verdict| verdict.ok) && !(strict && cautioned);
    if met { Ending::Met } else { Ending::NotMet }
}
