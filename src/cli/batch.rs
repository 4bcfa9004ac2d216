//! `hubgrip batch`: a table of joints, streamed.

use std::fs::File;
use std::io::{self, IsTerminal, Read, Write};
use std::path::{Path, PathBuf};
use std::time::Duration;

use clap::Args;
use hubgrip::diagnostic::Diagnostic;
use hubgrip::population::batch::{self, BatchError, Settings, Summary};
use indicatif::{ProgressBar, ProgressStyle};

use super::exit::{Ending, Failure};
use super::input::{self, WhatIf};
use super::output::{Output, refuse_overwriting, unwritable};
use super::whole::Whole;

const EXAMPLE: &str = "\
Example:
  hubgrip batch joints.csv --base joint.yaml -o findings.csv
  hubgrip batch joints.csv --base joint.yaml --columns slip_safety,hub_safety,ok
  hubgrip batch - --base joint.yaml --errors bad.csv < joints.csv > findings.csv

Columns are keys of a joint file, with the unit of plain numbers in brackets:
  id,diameter (mm),hub.outer_diameter (mm),fit,hub.roughness (Rz um)
A column that is no key, such as id, is carried along with --keep id. An empty
cell leaves the key to the base file.

Exit code 0: every row is met, 1: some row is not or has an error, 2: bad input.";

/// Many joints: a row of a table each, a row of findings each
#[derive(Debug, Args)]
#[command(after_help = EXAMPLE)]
pub struct Arguments {
    /// Table of comma-separated values; - is standard input
    #[arg(value_name = "TABLE.csv", required_unless_present = "list_columns")]
    pub table: Option<PathBuf>,
    /// Joint file that supplies what is common to all rows
    #[arg(long, value_name = "JOINT.yaml")]
    pub base: Option<PathBuf>,
    /// Where the findings go, whole or not at all; without it, or with -, standard output
    #[arg(long, short, value_name = "OUT.csv")]
    pub output: Option<PathBuf>,
    /// Where rows with errors go, with their line; without it they stay, with the column errors
    #[arg(long, value_name = "FILE")]
    pub errors: Option<PathBuf>,
    /// A column that is no key of a joint file, carried along unread (repeatable)
    #[arg(long, value_name = "COLUMN")]
    pub keep: Vec<String>,
    /// Output columns wanted, in their order; without it all
    #[arg(long, value_name = "NAMES", value_delimiter = ',')]
    pub columns: Vec<String>,
    /// Name the output columns
    #[arg(long)]
    pub list_columns: bool,
    #[command(flatten)]
    pub what_if: WhatIf,
}

pub fn run(arguments: &Arguments, materials: Option<&Path>, output: &Output) -> Result<Ending, Failure> {
    if arguments.list_columns {
        let names: String = batch::column_names().iter().map(|name| format!("{name}\n")).collect();
        return output.result(&names).map(|()| Ending::Met);
    }
    let Some(table) = &arguments.table else { return Ok(Ending::Met) };
    refuse_one_place_for_two(arguments)?;
    refuse_lost_inputs(table, arguments)?;
    let library = input::library(materials, output)?;
    let settings = Settings {
        base: arguments.base.as_deref().map(input::base).transpose()?,
        base_name: arguments.base.clone().unwrap_or_else(|| PathBuf::from("<row>")),
        set: arguments.what_if.set.clone(),
        keep: arguments.keep.clone(),
        columns: arguments.columns.clone(),
    };
    let (source, size) = open(table)?;
    let bar = bar(size, output);
    let mut findings = Sink::create(arguments.output.as_deref())?;
    let mut errors = arguments.errors.as_deref().map(|path| Sink::create(Some(path))).transpose()?;
    let result = batch::run(
        source,
        &mut findings,
        errors.as_mut().map(|errors| errors as &mut dyn Write),
        &settings,
        &library,
        &mut |progress| bar.set_position(progress.bytes),
    );
    bar.finish_and_clear();
    let summary = result.map_err(|error| refused(error, arguments))?;
    findings.finish(arguments.output.as_deref())?;
    if let Some(errors) = errors {
        errors.finish(arguments.errors.as_deref())?;
    }
    told(&summary, output);
    Ok(if summary.met == summary.rows { Ending::Met } else { Ending::NotMet })
}

/// Table and base are not both standard input, and neither is written over.
fn refuse_lost_inputs(table: &Path, arguments: &Arguments) -> Result<(), Failure> {
    let base = arguments.base.as_deref();
    if table == Path::new("-") && base == Some(Path::new("-")) {
        return Err(Diagnostic::new("standard input can be read only once")
            .with_help("give `-` for the table or for the base")
            .into());
    }
    let inputs = || std::iter::once(table).chain(base);
    refuse_overwriting("--output", arguments.output.as_deref(), inputs())?;
    refuse_overwriting("--errors", arguments.errors.as_deref(), inputs())
}

/// Findings and errors cannot share a place.
fn refuse_one_place_for_two(arguments: &Arguments) -> Result<(), Failure> {
    let real = |path: &PathBuf| path.canonicalize().unwrap_or_else(|_| path.clone());
    let is_stdout = |path: &PathBuf| path.as_os_str() == "-";
    let findings = arguments.output.as_ref().filter(|path| !is_stdout(path)).map(real);
    let errors = arguments.errors.as_ref().filter(|path| !is_stdout(path)).map(real);
    let both_stdout =
        arguments.output.as_ref().is_none_or(is_stdout) && arguments.errors.as_ref().is_some_and(is_stdout);
    if both_stdout || (findings.is_some() && findings == errors) {
        return Err(Diagnostic::new("findings and errors go to the same place")
            .with_help("give --errors a file of its own")
            .into());
    }
    Ok(())
}

/// The table with its size, when it has one.
fn open(table: &Path) -> Result<(Box<dyn Read>, Option<u64>), Failure> {
    if table == Path::new("-") {
        if io::stdin().is_terminal() {
            eprintln!("reading a table from standard input; end it with Ctrl-D");
        }
        return Ok((Box::new(io::stdin().lock()), None));
    }
    if table.is_dir() {
        let fault = Diagnostic::new("this is a folder, not a table").in_file(table);
        return Err(fault.with_help("name a file in it, such as joints.csv").into());
    }
    let opened = File::open(table).and_then(|file| Ok((file.metadata()?.len(), file)));
    match opened {
        Ok((size, file)) => Ok((Box::new(file), Some(size).filter(|size| *size > 0))),
        Err(error) => Err(Diagnostic::new(format!("cannot read: {error}"))
            .in_file(table)
            .with_help("name a table of comma-separated values, or `-` for standard input")
            .into()),
    }
}

/// A progress bar on a terminal, nothing elsewhere.
fn bar(size: Option<u64>, output: &Output) -> ProgressBar {
    if output.quiet() || !io::stderr().is_terminal() {
        return ProgressBar::hidden();
    }
    let (bar, template) = match size {
        Some(size) => (ProgressBar::new(size), "{bar:40} {percent:>3} %  {bytes}  {eta} left"),
        None => (ProgressBar::new_spinner(), "{spinner} {bytes}  {elapsed}"),
    };
    bar.enable_steady_tick(Duration::from_millis(200));
    match ProgressStyle::with_template(template) {
        Ok(style) => bar.with_style(style),
        Err(_) => bar,
    }
}

/// Standard output, or a file that takes its name when it is complete.
enum Sink {
    Stdout(io::BufWriter<io::Stdout>),
    File(Box<Whole>),
}

impl Sink {
    fn create(path: Option<&Path>) -> Result<Self, Failure> {
        match path {
            Some(path) if path.as_os_str() != "-" => Whole::create(path)
                .map(|file| Self::File(Box::new(file)))
                .map_err(|error| unwritable(path, &error)),
            _ => Ok(Self::Stdout(io::BufWriter::new(io::stdout()))),
        }
    }

    fn finish(self, path: Option<&Path>) -> Result<(), Failure> {
        let finished = match self {
            Self::Stdout(mut stdout) => stdout.flush(),
            Self::File(file) => file.finish(),
        };
        finished.map_err(|error| unwritable(path.unwrap_or(Path::new("<stdout>")), &error))
    }
}

impl Write for Sink {
    fn write(&mut self, bytes: &[u8]) -> io::Result<usize> {
        match self {
            Self::Stdout(stdout) => stdout.write(bytes),
            Self::File(file) => file.write(bytes),
        }
    }

    fn flush(&mut self) -> io::Result<()> {
        match self {
            Self::Stdout(stdout) => stdout.flush(),
            Self::File(file) => file.flush(),
        }
    }
}

fn refused(error: BatchError, arguments: &Arguments) -> Failure {
    let table = arguments.table.as_deref().map(input::shown).unwrap_or_default();
    let place = |path: &Option<PathBuf>| path.clone().unwrap_or_else(|| PathBuf::from("<stdout>"));
    match error {
        BatchError::Head(faults) => {
            // What is wrong with an option has no place in the table.
            let at_head = |fault: Diagnostic| {
                if fault.place.is_some() || !fault.message.starts_with("--") {
                    fault.in_file(&table)
                } else {
                    fault
                }
            };
            Failure::Input(faults.into_iter().map(at_head).collect())
        }
        BatchError::Output(error) => unwritable(&place(&arguments.output), &error),
        BatchError::Errors(error) => unwritable(&place(&arguments.errors), &error),
        error @ BatchError::Input { .. } => Diagnostic::new(error.to_string()).in_file(table).into(),
    }
}

/// How the rows ended, on standard error.
fn told(summary: &Summary, output: &Output) {
    let missed = summary.rows - summary.met - summary.bad;
    let mut said = format!("{} rows: {} meet every requirement, {missed} do not", summary.rows, summary.met);
    if let Some((line, message)) = &summary.first_bad {
        said.push_str(&format!(", {} have errors (the first: line {line}: {message})", summary.bad));
    }
    output.remark(&said);
}
