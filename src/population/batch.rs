//! A table of joints: one row a joint, one row of findings each, streamed.
//!
//! The columns are named as the keys of a joint file, `hub.outer_diameter (mm)` with the unit of its plain numbers;
//! a base joint file supplies what is common. Memory does not grow with the table, all cores work, and the bytes do
//! not depend on how many there are.

mod cell;
mod field;
mod header;
mod outcome;
mod row;
mod stream;
mod template;

use std::io::{self, Read, Write};
use std::path::PathBuf;

use thiserror::Error;

use crate::diagnostic::{Diagnostic, did_you_mean};
use crate::material::library::Library;
use outcome::{OutputColumn, output_columns};
use row::Rows;
use stream::{Sinks, Source};

/// How a table is read and what is written of it.
#[derive(Debug, Clone, Default)]
pub struct Settings {
    /// Text of the joint file that supplies what is common; none when every row says everything.
    pub base: Option<String>,
    /// What messages call that file.
    pub base_name: PathBuf,
    /// Changes from the command line, the same for every row.
    pub set: Vec<(String, String)>,
    /// Heads of columns that are no keys and are carried along.
    pub keep: Vec<String>,
    /// Names of the output columns wanted; all when empty.
    pub columns: Vec<String>,
}

/// How far a table has come.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Progress {
    /// Rows done.
    pub rows: u64,
    /// Bytes read.
    pub bytes: u64,
}

/// What became of a table.
#[derive(Debug, Clone, PartialEq, Eq, Default)]
pub struct Summary {
    /// Rows read.
    pub rows: u64,
    /// Rows that meet every requirement.
    pub met: u64,
    /// Rows with errors.
    pub bad: u64,
    /// Line and message of the first row with errors.
    pub first_bad: Option<(u64, String)>,
}

impl Summary {
    fn note(&mut self, line: u64, error: &str) {
        self.bad += 1;
        if self.first_bad.is_none() {
            self.first_bad = Some((line, error.to_owned()));
        }
    }

    /// Adds what comes after in the table.
    fn add(&mut self, after: &Self) {
        self.rows += after.rows;
        self.met += after.met;
        self.bad += after.bad;
        if self.first_bad.is_none() {
            self.first_bad.clone_from(&after.first_bad);
        }
    }
}

/// Why a table could not be carried through.
#[derive(Debug, Error)]
pub enum BatchError {
    /// Its head, or what was asked for, is not understood.
    #[error("the head of the table is not understood")]
    Head(Vec<Diagnostic>),
    /// It could not be read on.
    #[error("line {line}: {cause}")]
    Input {
        /// Line up to which it was read; 0 when that is not known.
        line: u64,
        /// What went wrong.
        cause: io::Error,
    },
    /// The output could not be written.
    #[error("the output could not be written: {0}")]
    Output(io::Error),
    /// The errors could not be written.
    #[error("the errors could not be written: {0}")]
    Errors(io::Error),
}

impl BatchError {
    fn of_csv(error: csv::Error) -> Self {
        let line = error.position().map_or(0, csv::Position::line);
        let cause = match error.into_kind() {
            csv::ErrorKind::Io(cause) => cause,
            other => io::Error::new(io::ErrorKind::InvalidData, format!("{other:?}")),
        };
        Self::Input { line, cause }
    }
}

/// Works out a table of joints.
///
/// Every row of `input` becomes a row of `output`: its own cells, the findings, and in the column `errors` what is
/// wrong with it. With `errors` given, rows with errors go there instead, with their line.
///
/// # Errors
/// [`BatchError`]; a row that is wrong is none.
///
/// # Example
/// ```
/// use hubgrip::material::library::Library;
/// use hubgrip::population::batch::{Settings, run};
///
/// let table = "\
/// diameter (mm),hub.outer_diameter (mm),fit,duty.0.torque (N.m)
/// 60,120,H7/s6,200
/// 60,50,H7/s6,200
/// ";
/// let base = "joint_file: 1\nlength: 70 mm\nshaft: {material: C45+N}\nhub: {material: C45+N}\nfriction: 0.12\n";
/// let settings = Settings {
///     base: Some(base.to_owned()),
///     columns: vec!["slip_safety".to_owned(), "ok".to_owned()],
///     ..Settings::default()
/// };
/// let mut output = Vec::new();
/// let library = Library::built_in();
/// let summary = run(table.as_bytes(), &mut output, None, &settings, &library, &mut |_| ()).unwrap();
/// assert_eq!((summary.rows, summary.met, summary.bad), (2, 1, 1));
/// let text = String::from_utf8(output).unwrap();
/// assert!(text.lines().nth(2).unwrap().contains("line 3: hub.outer_diameter: "));
/// ```
pub fn run<'a>(
    input: impl Read,
    output: &'a mut (dyn Write + 'a),
    errors: Option<&'a mut (dyn Write + 'a)>,
    settings: &Settings,
    library: &Library,
    progress: &mut dyn FnMut(Progress),
) -> Result<Summary, BatchError> {
    let wanted = wanted_columns(&settings.columns)?;
    let mut source = Source::new(input);
    let heads = source.heads()?;
    if heads.is_empty() {
        let help = "the first line names the columns, such as diameter (mm),length (mm),fit";
        return Err(BatchError::Head(vec![Diagnostic::new("the table is empty").with_help(help)]));
    }
    let columns = header::columns(&heads, &settings.keep, &settings.set).map_err(BatchError::Head)?;
    let base = settings.base.clone().unwrap_or_else(|| "joint_file: 1\n".to_owned());
    let rows = Rows::new(columns, library, base, settings.base_name.clone(), settings.set.clone());
    stream::stream(source, &rows, &wanted, Sinks { output, errors }, progress)
}

/// Names of the output columns, in order.
pub fn column_names() -> Vec<&'static str> {
    output_columns().into_iter().map(|(name, _)| name).collect()
}

fn wanted_columns(names: &[String]) -> Result<Vec<OutputColumn>, BatchError> {
    let all = output_columns();
    if names.is_empty() {
        return Ok(all);
    }
    let (mut wanted, mut faults) = (Vec::new(), Vec::new());
    for name in names {
        match all.iter().find(|(known, _)| *known == name.trim()) {
            Some(column) => wanted.push(*column),
            None => {
                let fault =
                    Diagnostic::new(format!("--columns: there is no output column `{}`", name.trim()));
                let known = || all.iter().map(|(known, _)| *known);
                faults.push(match did_you_mean(name, known()) {
                    Some(near) => fault.with_help(format!("did you mean `{near}`?")),
                    None => {
                        fault.with_help(format!("the columns are {}", known().collect::<Vec<_>>().join(", ")))
                    }
                });
            }
        }
    }
    if faults.is_empty() { Ok(wanted) } else { Err(BatchError::Head(faults)) }
}
