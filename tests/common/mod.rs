//! What several tests need: the examples, and the program as a process.
#![allow(dead_code)]

use std::fs;
use std::path::{Path, PathBuf};
use std::process::{Command, Output};

use hubgrip::findings::{Findings, compute};
use hubgrip::joint::read;
use hubgrip::material::library::Library;

/// Every joint file under `examples/`, in order of name.
pub fn examples() -> Vec<PathBuf> {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("examples");
    let mut files: Vec<PathBuf> = fs::read_dir(folder)
        .expect("the examples folder is there")
        .map(|entry| entry.expect("an entry can be read").path())
        .filter(|path| path.extension().is_some_and(|extension| extension == "yaml"))
        .collect();
    files.sort();
    files
}

/// Findings of a joint file.
pub fn findings(path: &Path) -> Findings {
    let text = fs::read_to_string(path).expect("the joint file can be read");
    findings_of(&text)
}

/// Findings of the text of a joint file.
pub fn findings_of(text: &str) -> Findings {
    let joint =
        read::read(text, Path::new("test.yaml"), &[], &Library::built_in()).expect("the joint file is right");
    compute(joint).expect("the findings can be computed")
}

/// Runs the program with these arguments in this folder.
pub fn hubgrip_in(folder: &Path, arguments: &[&str]) -> Output {
    Command::new(env!("CARGO_BIN_EXE_hubgrip"))
        .args(arguments)
        .current_dir(folder)
        .env_remove("HUBGRIP_MATERIALS")
        .env("XDG_DATA_HOME", folder)
        .env("XDG_DATA_DIRS", folder)
        .output()
        .expect("the program can be started")
}

/// Standard output as text.
pub fn stdout(output: &Output) -> String {
    String::from_utf8(output.stdout.clone()).expect("the output is UTF-8")
}

/// Standard error as text.
pub fn stderr(output: &Output) -> String {
    String::from_utf8(output.stderr.clone()).expect("the errors are UTF-8")
}
