//! A file that is written piece by piece and takes its name only when it is complete.

use std::fs::{self, File};
use std::io::{self, BufWriter, Write};
use std::path::{Path, PathBuf};

use tempfile::TempPath;

/// A file under construction; dropped before it is finished it leaves the target untouched.
///
/// It grows under a name of its own beside the target. A device or pipe is written straight; a symbolic link keeps
/// pointing where it does.
pub struct Whole(Kind);

enum Kind {
    Beside(Box<Beside>),
    Straight(BufWriter<File>),
}

struct Beside {
    /// The file apart from its name, which would get into the messages of its errors.
    temporary: BufWriter<File>,
    name: TempPath,
    target: PathBuf,
    existing: Option<fs::Metadata>,
}

impl Whole {
    /// Begins a file at this path.
    pub fn create(path: &Path) -> io::Result<Self> {
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
            let straight = fs::OpenOptions::new().write(true).open(&target)?;
            return Ok(Self(Kind::Straight(BufWriter::new(straight))));
        }
        let (temporary, name) = tempfile::Builder::new()
            .prefix(".hubgrip-")
            .tempfile_in(folder(&target))
            // The error's own text holds the name that was tried, which differs from run to run.
            .map_err(|error| io::Error::from(error.kind()))?
            .into_parts();
        let temporary = BufWriter::new(temporary);
        Ok(Self(Kind::Beside(Box::new(Beside { temporary, name, target, existing }))))
    }

    /// Gives the complete file its name.
    pub fn finish(self) -> io::Result<()> {
        match self.0 {
            Kind::Straight(mut straight) => straight.flush(),
            Kind::Beside(beside) => {
                let Beside { temporary, name, target, existing } = *beside;
                let temporary = temporary.into_inner().map_err(io::IntoInnerError::into_error)?;
                temporary.sync_all()?;
                permissions(&name, existing.as_ref())?;
                name.persist(&target).map_err(|error| error.error)?;
                Ok(())
            }
        }
    }
}

impl Write for Whole {
    fn write(&mut self, bytes: &[u8]) -> io::Result<usize> {
        match &mut self.0 {
            Kind::Beside(beside) => beside.temporary.write(bytes),
            Kind::Straight(straight) => straight.write(bytes),
        }
    }

    fn flush(&mut self) -> io::Result<()> {
        match &mut self.0 {
            Kind::Beside(beside) => beside.temporary.flush(),
            Kind::Straight(straight) => straight.flush(),
        }
    }
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
