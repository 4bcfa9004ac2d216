//! How the program ends: one exit code, every error told in one place.

use std::ffi::OsString;
use std::io::Write;
use std::process::ExitCode;

use hubgrip::diagnostic::Diagnostic;
use hubgrip::report::diagnostics;

use super::output::Output;

/// A command that ran to its end.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub enum Ending {
    /// All requirements met, or nothing was required.
    Met,
    /// Some requirement is not met.
    NotMet,
    /// Some of many inputs could not be read; the others have their results.
    NotRead,
}

impl Ending {
    /// 0, 1 or 2.
    pub fn code(self) -> ExitCode {
        match self {
            Self::Met => ExitCode::SUCCESS,
            Self::NotMet => ExitCode::from(1),
            Self::NotRead => ExitCode::from(TROUBLE),
        }
    }
}

/// Exit code of bad input or output that cannot be written.
const TROUBLE: u8 = 2;

/// Exit code of a fault in the program itself (EX_SOFTWARE of sysexits.h).
const FAULT: i32 = 70;

/// Why a command did not run to its end.
#[derive(Debug)]
pub enum Failure {
    /// Faults in the input, in the order of the file.
    Input(Vec<Diagnostic>),
    /// The reader of standard output has gone: not an error.
    PipeClosed,
}

impl From<Diagnostic> for Failure {
    fn from(diagnostic: Diagnostic) -> Self {
        Self::Input(vec![diagnostic])
    }
}

impl From<Box<Diagnostic>> for Failure {
    fn from(diagnostic: Box<Diagnostic>) -> Self {
        (*diagnostic).into()
    }
}

/// Tells a failure on standard error and gives its exit code.
pub fn told(failure: &Failure, json: bool, output: &Output) -> ExitCode {
    let Failure::Input(diagnostics) = failure else { return ExitCode::SUCCESS };
    if json {
        if let Some(first) = diagnostics.first() {
            output.error(&diagnostics::json(first));
        }
    } else {
        for diagnostic in diagnostics {
            output.error(&diagnostics::text(diagnostic));
        }
    }
    ExitCode::from(TROUBLE)
}

/// Help and version end well; a bad command line is trouble, told as JSON when `--json` is among the arguments.
pub fn usage(error: &clap::Error, arguments: impl IntoIterator<Item = OsString>) -> ExitCode {
    let json = arguments.into_iter().take_while(|word| word != "--").any(|word| word == "--json");
    if json && error.use_stderr() {
        let told = diagnostics::json(&misused(&error.render().to_string()));
        let _ = std::io::stderr().write_all(told.as_bytes());
        return ExitCode::from(TROUBLE);
    }
    let printed = error.print();
    if error.use_stderr() || printed.is_err_and(|error| error.kind() != std::io::ErrorKind::BrokenPipe) {
        ExitCode::from(TROUBLE)
    } else {
        ExitCode::SUCCESS
    }
}

/// What the reader of the command line says, in paragraphs: what is wrong, then tips and the usage.
fn misused(told: &str) -> Diagnostic {
    let one_line = |text: &str| text.split_whitespace().collect::<Vec<_>>().join(" ");
    let mut paragraphs = told.split("\n\n").map(one_line).filter(|text| !text.is_empty());
    let first = paragraphs.next().unwrap_or_default();
    let fault = Diagnostic::new(first.strip_prefix("error: ").unwrap_or(&first));
    let help: Vec<String> = paragraphs
        .filter(|text| !text.starts_with("For more information"))
        .map(|text| text.strip_prefix("tip: ").map_or(text.clone(), str::to_owned))
        .collect();
    if help.is_empty() { fault.with_help("try --help") } else { fault.with_help(help.join("; ")) }
}

/// A panic is a fault of the program: say so, and how to report it.
pub fn install_fault_hook() {
    std::panic::set_hook(Box::new(|fault| {
        let mut stderr = std::io::stderr().lock();
        let _ = writeln!(
            stderr,
            "hubgrip: this is a fault in hubgrip, not in your input: {fault}\n\
             Please report it with the command line, the joint file and the output of hubgrip --version."
        );
        std::process::exit(FAULT);
    }));
}
