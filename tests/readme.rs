//! What the README shows is run: its commands, and its joint files.

mod common;

use std::fs;
use std::path::Path;

use common::{hubgrip_in, stderr};

fn readme() -> String {
    fs::read_to_string(Path::new(env!("CARGO_MANIFEST_DIR")).join("README.md")).expect("the README is there")
}

/// The text of every fenced block of this kind.
fn blocks(text: &str, kind: &str) -> Vec<String> {
    let fence = format!("```{kind}\n");
    text.split(&fence).skip(1).filter_map(|rest| rest.split("```").next()).map(str::to_owned).collect()
}

/// Splits a command line as a shell does, as far as the README needs it.
fn words(line: &str) -> Vec<String> {
    let mut words = vec![String::new()];
    let mut quoted = false;
    for character in line.chars() {
        match character {
            '"' => quoted = !quoted,
            ' ' if !quoted => words.push(String::new()),
            other => words.last_mut().expect("there is a word").push(other),
        }
    }
    words.retain(|word| !word.is_empty());
    words
}

#[test]
fn every_command_of_the_readme_runs() {
    let here = tempfile::tempdir().expect("a temporary folder can be made");
    let examples = Path::new(env!("CARGO_MANIFEST_DIR")).join("examples");
    std::os::unix::fs::symlink(examples, here.path().join("examples")).expect("the examples can be linked");
    let mut run = 0;
    for line in blocks(&readme(), "console").iter().flat_map(|block| block.lines()) {
        let Some(command) = line.strip_prefix("$ ") else { continue };
        let command = command.replace("cargo run --release -- ", "hubgrip ");
        let Some(arguments) = command.strip_prefix("hubgrip ") else { continue };
        let arguments = words(arguments);
        let arguments: Vec<&str> = arguments.iter().map(String::as_str).collect();
        let output = hubgrip_in(here.path(), &arguments);
        let code = output.status.code().expect("it was not killed");
        assert!(code <= 1, "{command} ends with {code}: {}", stderr(&output));
        assert!(stderr(&output).is_empty(), "{command}: {}", stderr(&output));
        run += 1;
    }
    assert!(run >= 10, "only {run} commands were found");
}

#[test]
fn the_joint_file_of_the_readme_meets_its_requirements() {
    let text = blocks(&readme(), "yaml").remove(0);
    let findings = common::findings_of(&text);
    assert!(findings.verdicts.iter().all(|verdict| verdict.ok), "{:#?}", findings.verdicts);
}

#[test]
fn every_file_that_the_readme_links_to_is_there() {
    let root = Path::new(env!("CARGO_MANIFEST_DIR"));
    let text = readme();
    let mut links = 0;
    for rest in text.split("](").skip(1) {
        let target = rest.split(')').next().unwrap_or_default();
        if !target.starts_with("http") {
            assert!(root.join(target).exists(), "{target} is not there");
            links += 1;
        }
    }
    assert!(links >= 9, "only {links} links");
}

#[test]
fn every_example_is_in_the_readme() {
    for path in common::examples() {
        let name = path.file_name().and_then(|name| name.to_str()).expect("it has a name");
        assert!(readme().contains(&format!("examples/{name}")), "{name} is not in the README");
    }
}
