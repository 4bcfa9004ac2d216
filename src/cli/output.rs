//! Where results go: standard output, or a file that is written whole or not at all.

use std::fs;
use std::io::{self, IsTerminal, Write};
use std::path::{Path, PathBuf};

use anstream::{AutoStream, ColorChoice};
use hubgrip::diagnostic::Diagnostic;

use super::Colour;
use super::exit::Failure;

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
        write_whole(path, text.as_bytes()).map_err(|error| unwritable(path, &error))
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

fn unwritable(path: &Path, error: &io::Error) -> Failure {
    if error.kind() == io::ErrorKind::BrokenPipe {
        return Failure::PipeClosed;
    }
    Diagnostic::new(format!("cannot write: {error}"))
        .in_file(path)
        .with_help("give a file in a folder that exists and may be written")
        .into()
}

/// Writes through a temporary file in the same folder, so that the target is whole or untouched.
///
/// A device or pipe is written straight; a symbolic link keeps pointing where it does.
fn write_whole(path: &Path, bytes: &[u8]) -> io::Result<()> {
    let target = match fs::canonicalize(path) {
        Ok(target) => target,
        Err(error) if error.kind() == io::ErrorKind::NotFound => path.to_path_buf(),
        Err(error) => return Err(error),
    };
    let existing = fs::metadata(&target).ok();
    if existing.as_ref().is_some_and(fs::Metadata::is_dir) {
        return Err(io::Error::new(io::ErrorKind::IsADirectory, "it is a folder"));
    }
    if existing.as_ref().is_some_and(|found| !found.is_file()) {
        return fs::OpenOptions::new().write(true).open(&target)?.write_all(bytes);
    }
    let mut temporary = tempfile::Builder::new().prefix(".hubgrip-").tempfile_in(folder(&target))?;
    temporary.write_all(bytes)?;
    temporary.as_file().sync_all()?;
    permissions(temporary.path(), existing.as_ref())?;
    temporary.persist(&target).map_err(|error| error.error)?;
    Ok(())
}

fn folder(target: &Path) -> PathBuf {
    match target.parent() {
        Some(parent) if parent != Path::new("") => parent.to_path_buf(),
        _ => PathBuf::from("."),
    }
}

/// A new file gets the usual mode, a replaced one keeps its own.
#[cfg(unix)]
fn permissions(path: &Path, existing: Option<&fs::Metadata>) -> io::Result<()> {
    use std::os::unix::fs::PermissionsExt;
    let mode = existing.map_or(0o644, |found| found.permissions().mode());
    fs::set_permissions(path, fs::Permissions::from_mode(mode))
}

#[cfg(not(unix))]
fn permissions(_: &Path, _: Option<&fs::Metadata>) -> io::Result<()> {
    Ok(())
}
