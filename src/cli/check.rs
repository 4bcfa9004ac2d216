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
    /// Cautions count as requirements not met
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
        all.push(input::findings(file, &arguments.what_if.set, &library)?);
    }
    for (index, findings) in all.iter().enumerate() {
        if index > 0 && !arguments.json {
            output.result("\n")?;
        }
        let text = if arguments.json { json::to_json(findings) } else { terminal::text(findings) };
        output.result(&text)?;
        worst = worst.max(ending(findings, arguments.strict));
    }
    Ok(worst)
}

/// Whether all requirements are met; cautions count when the check is strict.
pub fn ending(findings: &Findings, strict: bool) -> Ending {
    let met = findings.verdicts.iter().all(|verdict| verdict.ok) && (!strict || findings.cautions.is_empty());
    if met { Ending::Met } else { Ending::NotMet }
}
