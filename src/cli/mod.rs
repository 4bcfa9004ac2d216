//! The command line: one file a command, one place where it ends.

mod batch;
mod check;
mod choose;
mod completions;
mod exit;
mod input;
mod limits;
mod materials;
mod new;
mod number;
mod output;
mod pressing;
mod report;
mod scatter;
mod schema;
mod sort;
mod whole;

use std::path::PathBuf;
use std::process::ExitCode;

use clap::{Args, CommandFactory, Parser, Subcommand, ValueEnum};

use exit::{Ending, Failure};
use output::Output;

const AFTER_HELP: &str = "\
Example:
  hubgrip new hub -o joint.yaml
  hubgrip check joint.yaml
  hubgrip report joint.yaml -o joint.html

Exit codes:
  0  all requirements met
  1  some requirement not met (a report is written all the same)
  2  bad command line, bad input, or output that cannot be written

hubgrip reads no network and no clock: the same input gives the same bytes.";

/// Press-fit and shrink-fit joints: does it hold, does it keep its strength, how is it assembled.
#[derive(Debug, Parser)]
#[command(name = "hubgrip", version, about, after_help = AFTER_HELP, arg_required_else_help = true)]
struct CommandLine {
    #[command(flatten)]
    global: Global,
    #[command(subcommand)]
    command: Command,
}

/// Options that every command takes.
#[derive(Debug, Args)]
struct Global {
    /// Colour on the terminal; NO_COLOR is honoured with auto
    #[arg(long, global = true, value_enum, default_value_t = Colour::Auto)]
    color: Colour,
    /// Folder with your own material files, searched first
    #[arg(long, global = true, value_name = "DIR")]
    materials: Option<PathBuf>,
    /// No remarks and no summary (errors are always told)
    #[arg(long, short, global = true)]
    quiet: bool,
}

#[derive(Debug, Clone, Copy, PartialEq, Eq, ValueEnum)]
enum Colour {
    Auto,
    Always,
    Never,
}

#[derive(Debug, Subcommand)]
enum Command {
    Check(check::Arguments),
    Report(report::Arguments),
    Limits(limits::Arguments),
    Choose(choose::Arguments),
    Scatter(scatter::Arguments),
    Sort(sort::Arguments),
    Batch(batch::Arguments),
    Pressing(pressing::Arguments),
    Materials(materials::Arguments),
    New(new::Arguments),
    Schema(schema::Arguments),
    Completions(completions::Arguments),
}

impl Command {
    /// Whether errors are told as JSON.
    fn json(&self) -> bool {
        match self {
            Self::Check(arguments) => arguments.json,
            Self::Limits(arguments) => arguments.json,
            Self::Choose(arguments) => arguments.json,
            Self::Scatter(arguments) => arguments.json,
            Self::Sort(arguments) => arguments.json,
            Self::Pressing(arguments) => arguments.json,
            _ => false,
        }
    }
}

/// Runs the command line of this process.
pub fn main() -> ExitCode {
    exit::install_fault_hook();
    let line = match CommandLine::try_parse() {
        Ok(line) => line,
        Err(error) => return exit::usage(&error, std::env::args_os()),
    };
    let output = Output::new(line.global.color, line.global.quiet);
    let json = line.command.json();
    match run(line, &output) {
        Ok(ending) => ending.code(),
        Err(failure) => exit::told(&failure, json, &output),
    }
}

fn run(line: CommandLine, output: &Output) -> Result<Ending, Failure> {
    let folder = line.global.materials.as_deref();
    match line.command {
        Command::Check(arguments) => check::run(&arguments, folder, output),
        Command::Report(arguments) => report::run(&arguments, folder, output),
        Command::Limits(arguments) => limits::run(&arguments, output),
        Command::Choose(arguments) => choose::run(&arguments, folder, output),
        Command::Scatter(arguments) => scatter::run(&arguments, folder, output),
        Command::Sort(arguments) => sort::run(&arguments, folder, output),
        Command::Batch(arguments) => batch::run(&arguments, folder, output),
        Command::Pressing(arguments) => pressing::run(&arguments, folder, output),
        Command::Materials(arguments) => materials::run(&arguments, folder, output),
        Command::New(arguments) => new::run(&arguments, output),
        Command::Schema(arguments) => schema::run(&arguments, output),
        Command::Completions(arguments) => completions::run(&arguments, CommandLine::command(), output),
    }
}
