//! `hubgrip new`: a commented joint file to start from.

use std::path::PathBuf;

use clap::Args;
use hubgrip::diagnostic::Diagnostic;
use hubgrip::joint::template;

use super::exit::{Ending, Failure};
use super::output::Output;

const EXAMPLE: &str = "\
Example:
  hubgrip new hub -o joint.yaml
  hubgrip check joint.yaml";

/// Write a commented joint file to start from
#[derive(Debug, Args)]
#[command(after_help = EXAMPLE)]
pub struct Arguments {
    /// What kind of joint; without it a plain hub, --list names them all
    #[arg(value_name = "KIND")]
    pub kind: Option<String>,
    /// Where it goes; without it standard output. An existing file is not overwritten
    #[arg(long, short, value_name = "JOINT.yaml")]
    pub output: Option<PathBuf>,
    /// Name the kinds
    #[arg(long, conflicts_with_all = ["kind", "output"])]
    pub list: bool,
}

pub fn run(arguments: &Arguments, output: &Output) -> Result<Ending, Failure> {
    if arguments.list {
        let names: Vec<String> = template::TEMPLATES
            .iter()
            .map(|template| format!("{:10} {}\n", template.kind, template.subject))
            .collect();
        output.result(&names.concat())?;
        return Ok(Ending::Met);
    }
    let template = template::find(arguments.kind.as_deref())?;
    match &arguments.output {
        Some(path) if path.exists() && path.as_os_str() != "-" => {
            Err(Diagnostic::new("the file exists and is not overwritten")
                .in_file(path)
                .with_help("choose another name")
                .into())
        }
        Some(path) => output.file(path, template.text).map(|()| Ending::Met),
        None => output.result(template.text).map(|()| Ending::Met),
    }
}
