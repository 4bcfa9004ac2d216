//! What a command reads: joint files, the material library, what-ifs.

use std::fs::File;
use std::io::{self, IsTerminal, Read};
use std::path::{Path, PathBuf};

use clap::Args;
use hubgrip::diagnostic::Diagnostic;
use hubgrip::findings::{self, Findings};
use hubgrip::joint::{Joint, read, set};
use hubgrip::material::library::{self, Library};
use hubgrip::population::kernel::KernelError;

use super::exit::Failure;
use super::output::Output;

/// What-ifs, taken by every command that reads a joint file.
#[derive(Debug, Args)]
pub struct WhatIf {
    /// Change a key of the joint file for this run, such as fit=H7/u6 or hub.outer_diameter=120mm
    #[arg(long = "set", value_name = "KEY=VALUE", value_parser = key_value)]
    pub set: Vec<(String, String)>,
}

fn key_value(text: &str) -> Result<(String, String), String> {
    set::split(text).map_err(|wrong| wrong.help.unwrap_or(wrong.message))
}

/// The material library with the user's folders in front.
pub fn library(folder: Option<&Path>, output: &Output) -> Result<Library, Failure> {
    if let Some(folder) = folder
        && !folder.is_dir()
    {
        return Err(Diagnostic::new("this is not a folder that can be read")
            .in_file(folder)
            .with_help("--materials takes a folder with material files (*.yaml)")
            .into());
    }
    let library = Library::open(&library::user_folders(folder)).map_err(Failure::Input)?;
    for hidden in library.hidden() {
        output.remark(&format!("caution: {hidden}"));
    }
    Ok(library)
}

/// Reads a joint file and computes its findings.
pub fn findings(path: &Path, set: &[(String, String)], library: &Library) -> Result<Findings, Failure> {
    let joint = joint(path, set, library)?;
    findings::compute(joint).map_err(|error| Diagnostic::new(error.to_string()).in_file(shown(path)).into())
}

/// Reads a joint file.
pub fn joint(path: &Path, set: &[(String, String)], library: &Library) -> Result<Joint, Failure> {
    let bytes = bytes(path)?;
    read::read_bytes(&bytes, &shown(path), set, library).map_err(Failure::Input)
}

/// The joint file of a population command: its text stays at hand, to show the key that a joint is refused for.
pub struct Source<'a> {
    path: &'a Path,
    set: &'a [(String, String)],
    bytes: Vec<u8>,
}

impl<'a> Source<'a> {
    /// Reads the file.
    pub fn of(path: &'a Path, what_if: &'a WhatIf) -> Result<Self, Failure> {
        Ok(Self { path, set: &what_if.set, bytes: bytes(path)? })
    }

    /// The joint in it.
    pub fn joint(&self, library: &Library) -> Result<Joint, Failure> {
        read::read_bytes(&self.bytes, &shown(self.path), self.set, library).map_err(Failure::Input)
    }

    /// The joint in it, whose fit is still to be chosen.
    pub fn joint_without_fit(&self, library: &Library) -> Result<Joint, Failure> {
        read::read_without_fit(&self.bytes, &shown(self.path), self.set, library).map_err(Failure::Input)
    }

    /// A file that the joint file names: it lies beside it.
    pub fn beside(&self, name: &str) -> PathBuf {
        self.path.parent().unwrap_or(Path::new("")).join(name)
    }

    /// A refusal of the joint, at the key that it is about.
    pub fn refused(&self, message: impl Into<String>, key: Option<&str>, help: Option<String>) -> Failure {
        let fault = Diagnostic::new(message).in_file(shown(self.path));
        let fault = match help {
            Some(help) => fault.with_help(help),
            None => fault,
        };
        match key {
            Some(key) => read::at_key(fault, &self.bytes, self.set, key).into(),
            None => fault.into(),
        }
    }

    /// What the kernel of the population commands refuses, with `instead` as the way out.
    pub fn refused_by_kernel(&self, error: &KernelError, joint: &Joint, instead: &str) -> Failure {
        let key = match error {
            KernelError::NotTwoRings(_) => Some("rings"),
            KernelError::Stepped => {
                let first = joint.slices.first().map(|slice| slice.hub_outer_diameter);
                let hub = joint.slices.iter().any(|slice| Some(slice.hub_outer_diameter) != first);
                Some(if hub { "hub.steps" } else { "shaft.steps" })
            }
            KernelError::MayYield => Some("require.allow"),
            _ => None,
        };
        self.refused(error.to_string(), key, key.map(|_| instead.to_owned()))
    }
}

/// The text of a joint file that a table completes.
pub fn base(path: &Path) -> Result<String, Failure> {
    read::text_to_complete(&bytes(path)?, &shown(path)).map_err(Failure::Input)
}

/// The files of measured parts that a joint names, which lie beside its file.
pub fn measured(joint: &Joint, file: &Path) -> Vec<PathBuf> {
    let folder = file.parent().unwrap_or(Path::new(""));
    joint.population.measured().map(|name| folder.join(name)).collect()
}

/// The name a file goes by in messages.
pub fn shown(path: &Path) -> PathBuf {
    if path == Path::new("-") { PathBuf::from("<stdin>") } else { path.to_path_buf() }
}

/// The bytes of a file or of standard input, one more than allowed at most.
fn bytes(path: &Path) -> Result<Vec<u8>, Failure> {
    let limit = read::LARGEST as u64 + 1;
    let mut bytes = Vec::new();
    let read = if path == Path::new("-") {
        if io::stdin().is_terminal() {
            eprintln!("reading a joint file from standard input; end it with Ctrl-D");
        }
        io::stdin().lock().take(limit).read_to_end(&mut bytes)
    } else if path.is_dir() {
        return Err(Diagnostic::new("this is a folder, not a joint file")
            .in_file(path)
            .with_help("name a file in it, such as joint.yaml")
            .into());
    } else {
        File::open(path).and_then(|file| file.take(limit).read_to_end(&mut bytes))
    };
    match read {
        Ok(_) => Ok(bytes),
        Err(error) => Err(Diagnostic::new(format!("cannot read: {error}"))
            .in_file(shown(path))
            .with_help("hubgrip new -o joint.yaml writes a joint file to start from")
            .into()),
    }
}
