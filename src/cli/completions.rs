//! `hubgrip completions`: shell completions.

use clap::{Args, Command};
use clap_complete::Shell;

use super::exit::{Ending, Failure};
use super::output::Output;

const EXAMPLE: &str = "\
Example:
  hubgrip completions bash > ~/.local/share/bash-completion/completions/hubgrip";

/// Completions for your shell
#[derive(Debug, Args)]
#[command(after_help = EXAMPLE)]
pub struct Arguments {
    /// Shell
    #[arg(value_enum)]
    pub shell: Shell,
}

pub fn run(arguments: &Arguments, mut command: Command, output: &Output) -> Result<Ending, Failure> {
    let mut script = Vec::new();
    clap_complete::generate(arguments.shell, &mut command, "hubgrip", &mut script);
    output.result(&String::from_utf8_lossy(&script))?;
    Ok(Ending::Met)
}
