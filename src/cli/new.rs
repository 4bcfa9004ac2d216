//! `hubgrip new`: a commented joint file to start from.

use std::path::PathBuf;

use clap::Args;
use hubgrip::diagnostic::Diagnostic;
use hubgrip::joint::template::{self, Template};

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
    #[arg(long)]
    pub list: bool,
}

pub fn run(arguments: &Arguments, output: &Output) -> Result<Ending, Failure> {
    if arguments.list {
        let names: Vec<String> =
            template::all().iter().map(|template| format!("{:10} {}\n", template.kind, template.about)).collect();
        output.result(&names.concat())?;
        return Ok(Ending::Met);
    }
    let template = find(arguments.kind.as_deref().unwrap_or("hub"))?;
    match &arguments.output {
        Some(path) if path.exists() && path.as_os_str() != "-" => {
            Err(Diagnostic::new("the file exists and is not overwritten").in_file(path).with_help("choose another name").into())
        }
        Some(path) => output.file(path, template.text).map(|()| Ending::Met),
        None => output.result(template.text).map(|()| Ending::Met),
    }
}

fn find(kind: &str) -> Result<&'static Template, Failure> {
    let all = template::all();
    if let Some(template) = all.iter().find(|template| template.kind.eq_ignore_ascii_case(kind)) {
        return Ok(template);
    }
    let kinds: Vec<&str> = all.iter().map(|template| template.kind).collect();
    let help = match hubgrip::diagnostic::did_you_mean(kind, kinds.iter().copied()) {
        Some(near) => format!("did you mean {near}? The kinds are {}", kinds.join(", ")),
        None => format!("the kinds are {}", kinds.join(", ")),
    };
    Err(Diagnostic::new(format!("there is no joint file of the kind {kind}")).with_help(help).into())
}
