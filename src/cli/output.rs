//! Where results go: standard output, or a file that is written whole or not at all.

use std::io::{self, IsTerminal, Write};
use std::path::Path;

use anstream::{AutoStream, ColorChoice};
use hubgrip::diagnostic::Diagnostic;

use super::Colour;
use super::exit::Failure;
use super::whole::Whole;

/// The two streams with the colour that was asked for.
pub struct Output {
    colour: ColorChoice,
    quiet: bool,
}

impl Output {
    /// Output with this colour; `quiet` drops remarks.
    pub fn new(colour: Colour, quiet: bool) -> Self {
        let colour = match colour {
            Colour::Auto => ColorChoice::Auto,
            Colour::Always => ColorChoice::Always,
            Colour::Never => ColorChoice::Never,
        };
        Self { colour, quiet }
    }

    /// Whether remarks are unwanted.
    pub fn quiet(&self) -> bool {
        self.quiet
    }

    /// Writes a page to its file, or to standard output for `-`, and the text beside it when there is room:
    /// not on the standard output that holds the page, and not when quiet was asked for.
    pub fn page(&self, path: &Path, page: &str, beside: impl FnOnce() -> String) -> Result<(), Failure> {
        self.file(path, page)?;
        if path == Path::new("-") || self.quiet {
            return Ok(());
        }
        self.result(&beside())
    }

    /// Writes a result to standard output.
    pub fn result(&self, text: &str) -> Result<(), Failure> {
        let mut stdout = AutoStream::new(io::stdout(), self.colour).lock();
        let written = stdout.write_all(text.as_bytes()).and_then(|()| stdout.flush());
        written.map_err(|error| unwritable(Path::new("<stdout>"), &error))
    }

    /// Writes an error to standard error; nothing can be done when that fails.
    pub fn error(&self, text: &str) {
        let mut stderr = AutoStream::new(io::stderr(), self.colour).lock();
        let _ = stderr.write_all(text.as_bytes()).and_then(|()| stderr.flush());
    }

    /// A remark on standard error.
    pub fn remark(&self, text: &str) {
        if !self.quiet {
            self.error(&format!("{text}\n"));
        }
    }

    /// Writes to a file, or to standard output for `-`.
    pub fn file(&self, path: &Path, text: &str) -> Result<(), Failure> {
        if path == Path::new("-") {
            return self.result(text);
        }
        let written = Whole::create(path).and_then(|mut file| {
            file.write_all(text.as_bytes())?;
            file.finish()
        });
        written.map_err(|error| unwritable(path, &error))
    }

    /// Standard output, refused when it is a terminal and the text is not for reading.
    pub fn not_for_terminal(&self, text: &str, help: &str) -> Result<(), Failure> {
        if io::stdout().is_terminal() {
            return Err(Diagnostic::new("the report is an HTML file, not text for a terminal")
                .with_help(help)
                .into());
        }
        self.result(text)
    }
}

/// Refuses an output that is one of the inputs: it would be lost.
///
/// Files are told apart by where they lie, whatever they are called on the way: `./a.yaml`, a symbolic link and (on
/// Linux) standard input from a file are seen through.
pub fn refuse_overwriting<'a>(
    option: &str,
    output: Option<&Path>,
    inputs: impl IntoIterator<Item = &'a Path>,
) -> Result<(), Failure> {
    let Some(output) = output.filter(|path| *path != Path::new("-")) else { return Ok(()) };
    let Ok(real) = output.canonicalize() else { return Ok(()) };
    let standard_input = Path::new("/dev/stdin");
    let place = |input: &'a Path| if input == Path::new("-") { standard_input } else { input };
    let is_output =
        |input: &'a Path| place(input).canonicalize().is_ok_and(|input| input == real && input.is_file());
    if inputs.into_iter().any(is_output) {
        return Err(Diagnostic::new(format!("{option} names an input, which would be overwritten"))
            .in_file(output)
            .with_help("give the output a name of its own")
            .into());
    }
    Ok(())
}

/// An output that cannot be written; a reader that has gone is no error.
pub fn unwritable(path: &Path, error: &io::Error) -> Failure {
    if error.kind() == io::ErrorKind::BrokenPipe {
        return Failure::PipeClosed;
    }
    let folder = path.parent().filter(|folder| !folder.as_os_str().is_empty() && !folder.exists());
    let cause = match folder {
        Some(folder) => format!("the folder {} does not exist", folder.display()),
        None => error.to_string(),
    };
    Diagnostic::new(format!("cannot write: {cause}"))
        .in_file(path)
        .with_help("give a file in a folder that exists and may be written")
        .into()
}
