//! The program as a process, used wrongly: nothing is overwritten, and what is told says what would be right.

mod common;

use std::fs;
use std::path::{Path, PathBuf};
use std::process::Output;

use common::{hubgrip_in, stderr, stdout};

/// The minimal joint file of the README.
const PLAIN: &str = "\
joint_file: 1
title: Fan hub on a motor shaft
diameter: 60 mm
length: 70 mm
shaft: {material: C45+N}
hub: {material: C45+N, outer_diameter: 120 mm}
fit: H7/s6
duty:
  - {state: rated, torque: 100 N.m}
";

fn folder_with(files: &[(&str, &str)]) -> tempfile::TempDir {
    let folder = tempfile::tempdir().expect("a temporary folder can be made");
    for (name, text) in files {
        fs::write(folder.path().join(name), text).expect("the file can be written");
    }
    folder
}

fn example(name: &str) -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join("examples").join(name)
}

fn exit_code(output: &Output) -> i32 {
    output.status.code().expect("the program was not killed")
}

/// Every file of a folder with its text, in order of name.
fn contents(folder: &Path) -> Vec<(PathBuf, String)> {
    let mut found: Vec<(PathBuf, String)> = fs::read_dir(folder)
        .expect("the folder can be read")
        .map(|entry| entry.expect("an entry can be read").path())
        .map(|path| (path.clone(), fs::read_to_string(path).expect("the file is text")))
        .collect();
    found.sort();
    found
}

#[test]
fn no_command_overwrites_what_it_reads() {
    let text = |name: &str| fs::read_to_string(example(name)).expect("the example can be read");
    let here = folder_with(&[
        ("self.yaml", PLAIN),
        ("lots.yaml", &text("population/measured-lots.yaml")),
        ("holes.csv", &text("population/holes.csv")),
        ("shafts.csv", &text("population/shafts.csv")),
        ("base.yaml", &text("batch/base.yaml")),
        ("joints.csv", &text("batch/joints.csv")),
        ("press.yaml", &text("pressing/joint.yaml")),
        ("record.csv", &text("pressing/pinion-01.csv")),
    ]);
    let before = contents(here.path());
    let absolute = here.path().join("self.yaml");
    for arguments in [
        vec!["report", "self.yaml", "-o", "self.yaml"],
        vec!["report", "self.yaml", "-o", "./self.yaml"],
        vec!["report", "self.yaml", "-o", absolute.to_str().expect("the path is UTF-8")],
        vec!["report", "lots.yaml", "-o", "holes.csv"],
        vec!["choose", "self.yaml", "-o", "self.yaml"],
        vec!["scatter", "self.yaml", "-o", "self.yaml"],
        vec!["scatter", "lots.yaml", "-o", "lots.yaml"],
        vec!["scatter", "lots.yaml", "-o", "shafts.csv", "--json"],
        vec!["sort", "lots.yaml", "--pick-list", "lots.yaml"],
        vec!["sort", "lots.yaml", "--pick-list", "holes.csv"],
        vec![
            "sort",
            "self.yaml",
            "--holes",
            "holes.csv",
            "--shafts",
            "shafts.csv",
            "--pick-list",
            "shafts.csv",
        ],
        vec!["batch", "joints.csv", "--base", "base.yaml", "--keep", "id", "-o", "joints.csv"],
        vec!["batch", "joints.csv", "--base", "base.yaml", "--keep", "id", "-o", "base.yaml"],
        vec!["batch", "joints.csv", "--base", "base.yaml", "--keep", "id", "--errors", "joints.csv"],
        vec!["pressing", "press.yaml", "record.csv", "-o", "press.yaml"],
        vec!["pressing", "press.yaml", "record.csv", "-o", "record.csv"],
        vec!["pressing", "press.yaml", ".", "-o", "record.csv"],
    ] {
        let output = hubgrip_in(here.path(), &arguments);
        assert_eq!(exit_code(&output), 2, "{arguments:?}: {}", stderr(&output));
        assert!(
            stderr(&output).contains("names an input, which would be overwritten"),
            "{arguments:?}: {}",
            stderr(&output)
        );
        assert_eq!(stdout(&output), "", "{arguments:?}");
        assert_eq!(contents(here.path()), before, "{arguments:?}");
    }
    // Another file that exists is replaced as before.
    let output = hubgrip_in(here.path(), &["report", "self.yaml", "-o", "base.yaml", "-q"]);
    assert_eq!(exit_code(&output), 0, "{}", stderr(&output));
    assert_ne!(contents(here.path()), before);
}

#[cfg(target_os = "linux")]
#[test]
fn a_link_and_a_redirected_input_are_seen_through() {
    use std::process::{Command, Stdio};
    let here = folder_with(&[("self.yaml", PLAIN)]);
    let link = here.path().join("link.html");
    std::os::unix::fs::symlink("self.yaml", &link).expect("a link can be made");
    let output = hubgrip_in(here.path(), &["report", "self.yaml", "-o", "link.html"]);
    assert_eq!(exit_code(&output), 2, "{}", stderr(&output));
    let file = fs::File::open(here.path().join("self.yaml")).expect("the file can be read");
    let output = Command::new(env!("CARGO_BIN_EXE_hubgrip"))
        .args(["report", "-", "-o", "self.yaml"])
        .current_dir(here.path())
        .stdin(Stdio::from(file))
        .output()
        .expect("the program can be started");
    assert_eq!(exit_code(&output), 2, "{}", stderr(&output));
    assert_eq!(fs::read_to_string(here.path().join("self.yaml")).expect("the file is there"), PLAIN);
}

#[test]
fn a_state_that_does_not_exist_is_not_made_beside_the_others() {
    let here = folder_with(&[("joint.yaml", PLAIN), ("table.csv", "duty.1.torque (N.m)\n10\n")]);
    let output = hubgrip_in(here.path(), &["check", "joint.yaml", "--set", "duty.1.torque=10N.m"]);
    assert_eq!(exit_code(&output), 2, "{}", stdout(&output));
    let told = stderr(&output);
    assert!(told.contains("there is no state 1") && told.contains("0 (`rated`)"), "{told}");
    let output = hubgrip_in(here.path(), &["check", "joint.yaml", "--set", "duty.0.torque=10N.m"]);
    assert_eq!(exit_code(&output), 0, "{}", stderr(&output));
    let bad = hubgrip_in(here.path(), &["batch", "table.csv", "--base", "joint.yaml", "-q"]);
    assert!(stdout(&bad).contains("there is no state 1"), "{}{}", stdout(&bad), stderr(&bad));
}

/// The README: with --json an error is one JSON object on standard error.
#[test]
fn a_bad_command_line_is_told_as_json_when_json_is_asked_for() {
    let here = folder_with(&[("joint.yaml", PLAIN)]);
    for (arguments, words) in [
        (vec!["check", "--json"], "<JOINT.yaml>"),
        (vec!["check", "--json", "--bogus"], "'--bogus'"),
        (vec!["check", "joint.yaml", "--json", "--set", "foo"], "'foo'"),
        (vec!["chek", "--json"], "'chek'"),
        (vec!["limits", "--json", "60mm"], "<FIT>"),
        (vec!["sort", "joint.yaml", "--by", "nothing", "--json"], "'nothing'"),
        (vec!["report", "joint.yaml", "--json"], "'--json'"),
    ] {
        let output = hubgrip_in(here.path(), &arguments);
        assert_eq!((exit_code(&output), stdout(&output).as_str()), (2, ""), "{arguments:?}");
        assert_eq!(stderr(&output).lines().count(), 1, "{arguments:?}: {}", stderr(&output));
        let told: serde_json::Value = serde_json::from_str(&stderr(&output)).expect("it is JSON");
        let message = told["error"]["message"].as_str().expect("it has a message");
        assert!(message.contains(words) && !message.starts_with("error"), "{arguments:?}: {message}");
        assert!(told["error"]["help"].as_str().is_some_and(|help| !help.is_empty()), "{arguments:?}");
        assert!(told["error"]["file"].is_null() && told["error"]["line"].is_null(), "{arguments:?}");
    }
    let plain = hubgrip_in(here.path(), &["check"]);
    assert!(exit_code(&plain) == 2 && stderr(&plain).starts_with("error: "), "{}", stderr(&plain));
    let behind = hubgrip_in(here.path(), &["check", "--bogus", "--", "--json"]);
    assert!(stderr(&behind).starts_with("error: "), "a file may be called --json: {}", stderr(&behind));
    let help = hubgrip_in(here.path(), &["check", "--json", "--help"]);
    assert!(exit_code(&help) == 0 && stdout(&help).contains("Example:"), "{}", stdout(&help));
}

#[test]
fn several_files_are_told_apart_though_their_titles_agree() {
    let here = folder_with(&[("a.yaml", PLAIN), ("b.yaml", &PLAIN.replace("70 mm", "80 mm"))]);
    let alone = |file: &str, more: &[&str]| {
        let arguments: Vec<&str> = ["check", file].into_iter().chain(more.iter().copied()).collect();
        stdout(&hubgrip_in(here.path(), &arguments))
    };
    let both = stdout(&hubgrip_in(here.path(), &["check", "a.yaml", "b.yaml"]));
    assert_eq!(both, format!("a.yaml:\n{}\nb.yaml:\n{}", alone("a.yaml", &[]), alone("b.yaml", &[])));
    let both = stdout(&hubgrip_in(here.path(), &["check", "a.yaml", "b.yaml", "--json"]));
    let mut found = serde_json::Deserializer::from_str(&both).into_iter::<serde_json::Value>();
    for file in ["a.yaml", "b.yaml"] {
        let mut object = found.next().expect("there is an object for each file").expect("it is JSON");
        let name = object.as_object_mut().and_then(|keys| keys.remove("file"));
        assert_eq!(name, Some(serde_json::Value::from(file)));
        let only: serde_json::Value = serde_json::from_str(&alone(file, &["--json"])).expect("it is JSON");
        assert!(only.get("file").is_none());
        assert_eq!(object, only);
    }
    assert!(found.next().is_none());
}

#[test]
fn limits_says_what_is_not_defined_and_joins_its_words() {
    let here = folder_with(&[]);
    for (arguments, message, help) in [
        (["60mm", "H19"], "there is no grade `19`; grades are 01, 0 and 1 to 18", "a letter and a grade"),
        (["60mm", "I7"], "ISO 286 has no deviation `I`", "deviations are a, b"),
        (["4000mm", "H7"], "outside ISO 286, which covers over 0 to 3150 mm", "agreed with the maker"),
        (["4000mm", "H7/s6"], "outside ISO 286", "a joint file takes limits as numbers"),
        (["2in", "LC 6"], "its table is not carried", "look it up in a printed copy"),
    ] {
        let output = hubgrip_in(here.path(), &["limits", arguments[0], arguments[1]]);
        assert_eq!(exit_code(&output), 2, "{arguments:?}: {}", stdout(&output));
        let told = stderr(&output);
        assert!(told.contains(message) && told.contains(help), "{arguments:?}: {told}");
        assert!(!told.contains("`/`") && !told.contains('{'), "{arguments:?}: {told}");
    }
    for (apart, together) in [(&["2in", "FN", "4"], "FN 4"), (&["60mm", "H7", "/s6"], "H7 /s6")] {
        let arguments: Vec<&str> = ["limits"].into_iter().chain(apart.iter().copied()).collect();
        let output = hubgrip_in(here.path(), &arguments);
        assert_eq!(exit_code(&output), 0, "{apart:?}: {}", stderr(&output));
        assert_eq!(stdout(&output), stdout(&hubgrip_in(here.path(), &["limits", apart[0], together])));
    }
}

/// What is told of an output that cannot be written has the same bytes in every run: the name that was given, and why.
#[test]
fn an_output_that_cannot_be_written_is_named_as_it_was_given() {
    let here = folder_with(&[("joint.yaml", PLAIN), ("a-file", "kept")]);
    for (target, why) in [
        ("missing/out.html", "cannot write: the folder missing does not exist"),
        ("a-file/out.html", "cannot write: "),
        (".", "cannot write: it is a folder"),
    ] {
        let run = || hubgrip_in(here.path(), &["report", "joint.yaml", "-o", target]);
        let (first, second) = (run(), run());
        assert_eq!(exit_code(&first), 2, "{target}");
        let told = stderr(&first);
        assert!(told.starts_with(&format!("{target}: error: {why}")), "{told}");
        assert!(!told.contains(".hubgrip-"), "{told}");
        assert_eq!(told, stderr(&second));
        assert_eq!(stdout(&first), "", "{target}");
    }
}

#[test]
fn the_list_of_kinds_is_not_asked_for_beside_a_file() {
    let here = folder_with(&[]);
    for arguments in [["new", "--list", "-o", "x.yaml"].as_slice(), &["new", "hub", "--list"]] {
        let output = hubgrip_in(here.path(), arguments);
        assert_eq!((exit_code(&output), stdout(&output).as_str()), (2, ""), "{arguments:?}");
        assert!(stderr(&output).contains("cannot be used with"), "{arguments:?}: {}", stderr(&output));
    }
    assert_eq!(contents(here.path()), []);
}

#[test]
fn a_state_without_a_name_is_not_called_state_twice() {
    let unnamed = "  - {torque: 10 N.m, reversing: true, relaxation: 0.9, bending_moment: 20 N.m}\n  - {temperature: 21 degC}\n";
    let here = folder_with(&[("joint.yaml", &format!("{PLAIN}{unnamed}"))]);
    let outputs = [
        ["check", "joint.yaml", "-q"].as_slice(),
        &["check", "joint.yaml", "--json"],
        &["report", "joint.yaml", "-o", "-"],
    ];
    for arguments in outputs {
        let told = stdout(&hubgrip_in(here.path(), arguments));
        assert!(told.contains("state 3") && !told.to_lowercase().contains("state state"), "{arguments:?}");
    }
}
