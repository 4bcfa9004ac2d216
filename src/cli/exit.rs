//! How the program ends: one exit code, every error told in one place.

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

/// Help and version end well; a bad command line is trouble.
pub fn usage(error: &clap::Error) -> ExitCode {
    let printed = error.print();
    if error.use_stderr() || printed.is_err_and(|error| error.kind() != std::io::ErrorKind::BrokenPipe) {
        ExitCode::from(TROUBLE)
    } else {
        ExitCode::SUCCESS
    }
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
