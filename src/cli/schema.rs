//! `hubgrip schema`: JSON Schema of the joint file, for editors.

use clap::Args;
use hubgrip::joint::schema;

use super::exit::{Ending, Failure};
use super::output::Output;

const EXAMPLE: &str = "\
Example:
  hubgrip schema > joint.schema.json

An editor that reads JSON Schema then completes keys when the joint file begins with
  # yaml-language-server: $schema=joint.schema.json";

/// JSON Schema of the joint file for editors (draft 7)
#[derive(Debug, Args)]
#[command(after_help = EXAMPLE)]
pub struct Arguments {}

pub fn run(_: &Arguments, output: &Output) -> Result<Ending, Failure> {
    output.result(&schema::schema())?;
    Ok(Ending::Met)
}
