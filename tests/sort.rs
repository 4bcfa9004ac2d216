//! Selective assembly: published groups, the command, pick lists.

mod common;

use std::path::Path;

use common::{hubgrip_in, stderr, stdout};
use hubgrip::material::Range;
use hubgrip::population::distribution::Distribution;
use hubgrip::population::sort::groups::{Grouping, Lots};
use hubgrip::tolerance::Limits;

/// V. B. Bhandari, *Design of Machine Elements*, example 3.3: 50 H7-s6 in three groups, hub 0-8-16-25 µm, shaft
/// 43-48-55-59 µm. Interference 59 to 18 µm in all; group A 48 to 35, B 47 to 32, C 43 to 30 µm.
#[test]
fn groups_have_the_published_interferences() {
    let micrometres = |values: [f64; 4]| values.map(|value| value * 1e-6);
    let (hole, shaft) = (micrometres([0.0, 8.0, 16.0, 25.0]), micrometres([43.0, 48.0, 55.0, 59.0]));
    let lots = Lots {
        holes: Distribution::uniform(0.0, 25e-6).unwrap(),
        shafts: Distribution::uniform(43e-6, 59e-6).unwrap(),
        hole: Limits { lower: 0.0, upper: 25e-6 },
        shaft: Limits { lower: 43e-6, upper: 59e-6 },
    };
    let groups = lots.at(&hole, &shaft, Range { low: 30e-6, high: 48e-6 }).unwrap();
    let printed = [(48.0, 35.0), (47.0, 32.0), (43.0, 30.0)];
    for (group, (most, least)) in groups.groups.iter().zip(printed) {
        assert!((group.interference.high * 1e6 - most).abs() < 1e-9, "{group:?}");
        assert!((group.interference.low * 1e6 - least).abs() < 1e-9, "{group:?}");
        assert!((group.within - 1.0).abs() < 1e-9, "{group:?}");
    }
    let all = lots.sorted(1, Grouping::EqualWidth, Range { low: 0.0, high: 1.0 }).unwrap();
    assert!((all.groups[0].interference.high * 1e6 - 59.0).abs() < 1e-9);
    assert!((all.groups[0].interference.low * 1e6 - 18.0).abs() < 1e-9);
    // The book's groups do not match in number: shares 8/25, 8/25, 9/25 of the hubs, 5/16, 7/16, 4/16 of the shafts.
    let mates =
        (5.0f64 / 16.0).min(8.0 / 25.0) + (7.0f64 / 16.0).min(8.0 / 25.0) + (4.0f64 / 16.0).min(9.0 / 25.0);
    assert!((groups.mates() - mates).abs() < 1e-9, "{}", groups.mates());
}

fn example(name: &str) -> String {
    let path = Path::new(env!("CARGO_MANIFEST_DIR")).join("examples/population").join(name);
    path.to_str().unwrap().to_owned()
}

#[test]
fn pick_lists_stay_in_the_band_and_use_no_part_twice() {
    let here = tempfile::tempdir().unwrap();
    let file = example("measured-lots.yaml");
    let arguments =
        ["sort", &file, "--groups", "3", "--band", "52 to 66 um", "--pick-list", "pairs.csv", "--json"];
    let output = hubgrip_in(here.path(), &arguments);
    assert!(stderr(&output).is_empty(), "{}", stderr(&output));
    let value: serde_json::Value = serde_json::from_str(&stdout(&output)).unwrap();
    let pairs = value["matching"]["pairs"].as_array().unwrap();
    assert!(pairs.len() >= 50, "{}", pairs.len());
    let mut table = csv::Reader::from_path(here.path().join("pairs.csv")).unwrap();
    let rows: Vec<csv::StringRecord> = table.records().map(Result::unwrap).collect();
    assert_eq!(rows.len(), 60 + 64 - pairs.len());
    let mut names = std::collections::BTreeSet::new();
    for row in &rows {
        for name in [&row[1], &row[3]] {
            assert!(name.is_empty() || names.insert(name.to_owned()), "{name} twice");
        }
        if !row[0].is_empty() {
            let u: f64 = row[5].parse().unwrap();
            assert!((52.0..=66.0).contains(&u), "{row:?}");
            let (hole, shaft): (f64, f64) = (row[2].parse().unwrap(), row[4].parse().unwrap());
            assert!(((shaft - hole) * 1e3 - u).abs() < 1e-3, "{row:?}");
        }
    }
    assert_eq!(names.len(), 124);
}

#[test]
fn the_text_fits_a_terminal_and_says_what_was_assumed() {
    let here = tempfile::tempdir().unwrap();
    let file = example("motor-hub.yaml");
    for by in ["width", "share"] {
        let arguments = ["sort", &file, "--groups", "4", "--by", by, "--band", "75 to 100 um"];
        let output = hubgrip_in(here.path(), &arguments);
        assert!(stderr(&output).is_empty(), "{}", stderr(&output));
        let text = stdout(&output);
        let widest = text.lines().map(|line| line.chars().count()).max().unwrap_or(0);
        assert!(widest <= 80, "a line of {widest} characters:\n{text}");
        assert!(text.contains("find a mate"), "{text}");
    }
}

#[test]
fn without_a_band_the_requirements_give_it() {
    let here = tempfile::tempdir().unwrap();
    let file = example("measured-lots.yaml");
    for (more, questions) in [
        (vec![], ["hold", "strength"]),
        // Speed loosens and stresses, a relaxed pressure holds less: the band is that of `choose`.
        (vec!["duty.0.speed=9000 rpm", "duty.0.relaxation=0.8"], ["hold", "strength"]),
        (vec!["require.press_force=60 kN"], ["hold", "assembly"]),
        (vec!["duty.0.bending_moment=20 N.m", "require.slip_safety=0.3"], ["hold", "strength"]),
    ] {
        let set: Vec<&str> = more.iter().flat_map(|set| ["--set", *set]).collect();
        let output =
            hubgrip_in(here.path(), &[&["sort", &file, "--groups", "2", "--json"], set.as_slice()].concat());
        let value: serde_json::Value = serde_json::from_str(&stdout(&output)).unwrap_or_default();
        assert!(value.is_object(), "{more:?}: {}", stderr(&output));
        assert_eq!(value["band"]["source"], "from the requirements of the joint file");
        let ends = ["low_um", "high_um"].map(|end| value["band"][end].as_f64().unwrap());
        // At both ends the check of a measured pair just meets its requirement.
        for (interference, question) in ends.into_iter().zip(questions) {
            let shaft = 40.0 + interference * 1e-3;
            let fit = format!("fit={{measured: {{hole: 40 mm, shaft: {shaft:.9} mm, uncertainty: 0 um}}}}");
            let words = [&["check", &file, "--json", "--set", &fit], set.as_slice()].concat();
            let found: serde_json::Value =
                serde_json::from_str(&stdout(&hubgrip_in(here.path(), &words))).unwrap();
            let verdicts = found["verdicts"].as_array().unwrap().iter().filter(|v| v["question"] == question);
            let margin = verdicts
                .map(|v| v["found"].as_f64().unwrap_or(f64::MAX) / v["required"].as_f64().unwrap())
                .map(|margin| if question == "assembly" { 1.0 / margin } else { margin })
                .fold(f64::MAX, f64::min);
            assert!((margin - 1.0).abs() < 1e-4, "{more:?} {question}: {margin}");
        }
    }
}

#[test]
fn what_cannot_be_sorted_is_told() {
    let here = tempfile::tempdir().unwrap();
    let file = example("motor-hub.yaml");
    for (arguments, message) in [
        (vec!["--groups", "0", "--band", "75 to 100 um"], "0 groups"),
        (vec!["--groups", "3", "--band", "75"], "has no unit"),
        (vec!["--groups", "3", "--band", "75 um"], "one value"),
        (vec!["--groups", "3", "--band", "75 to 100 um", "--pick-list", "x.csv"], "needs measured holes"),
        (vec!["--groups", "3", "--band", "75 to 100 um", "--holes", "no.csv"], "no.csv"),
        (vec!["--band", "10 to 11 um"], "no number of groups"),
    ] {
        let all: Vec<&str> = ["sort", &file].into_iter().chain(arguments).collect();
        let output = hubgrip_in(here.path(), &all);
        assert_eq!(output.status.code(), Some(2), "{all:?}: {}", stdout(&output));
        assert!(stderr(&output).contains(message), "{all:?}: {}", stderr(&output));
    }
}

/// Lists as spreadsheets of other countries write them give the same groups; what cannot be a list of this joint is told
/// with its line.
#[test]
fn lists_are_read_as_they_come_or_refused() {
    let here = tempfile::tempdir().unwrap();
    let file = example("measured-lots.yaml");
    let run = |list: &str, more: &[&str]| {
        std::fs::write(here.path().join("holes.csv"), list).unwrap();
        let shafts = example("shafts.csv");
        let words = ["sort", &file, "--groups", "2", "--band", "52 to 66 um", "--holes", "holes.csv"];
        hubgrip_in(here.path(), &[&words, &["--shafts", &shafts][..], more].concat())
    };
    let plain = run("part,diameter_mm\nA,40.0096\nB,40.0102\n", &["--json"]);
    assert!(plain.status.code().unwrap() < 2, "{}", stderr(&plain));
    for list in [
        "\u{feff}part,diameter_mm\r\nA,40.0096\r\nB,40.0102\r\n",
        "\u{feff}part;diameter_mm\r\nA;40,0096\r\nB;40,0102\r\n",
        "\"part\"\t\"diameter (mm)\"\nA\t\"40.0096\"\nB\t40,0102\n",
        "part,diameter\nA,40.0096 mm\n\nB,40010.2 um\n",
    ] {
        assert_eq!(stdout(&run(list, &["--json"])), stdout(&plain), "{list}");
    }
    for (list, words) in [
        ("", "no column of sizes"),
        ("part,diameter_mm\n", "no part under the first row"),
        ("40.01\n40.02\n", "no column of sizes"),
        ("diameter_mm\n40,01\n", "line 2: the row has 2 cells"),
        ("diameter_mm\n40.01\nabc\n", "line 3: abc mm is not a length"),
        ("diameter\n40.01\n", "has no unit"),
        ("part,diameter_mm\nA,0.0401\n", "part A: 40.1 um is more than 5 % off"),
        ("diameter (um)\n9.6\n", "whole sizes, not deviations"),
    ] {
        let output = run(list, &[]);
        assert_eq!((output.status.code(), stdout(&output).as_str()), (Some(2), ""), "{list:?}");
        assert!(
            stderr(&output).contains(words) && stderr(&output).contains("holes.csv"),
            "{}",
            stderr(&output)
        );
    }
    std::fs::create_dir(here.path().join("folder")).unwrap();
    let words = ["sort", &file, "--groups", "2", "--band", "52 to 66 um", "--holes", "folder"];
    let output = hubgrip_in(here.path(), &words);
    assert!(
        output.status.code() == Some(2) && stderr(&output).contains("this is a folder"),
        "{}",
        stderr(&output)
    );
}

#[test]
fn slips_of_the_command_line_are_told() {
    let here = tempfile::tempdir().unwrap();
    let file = example("measured-lots.yaml");
    std::fs::write(here.path().join("holes.csv"), "part,diameter_mm\nA,40.0096\n").unwrap();
    for (arguments, message) in [
        (vec!["--groups", "-1"], "below zero"),
        (vec!["--groups", "two"], "write a whole number"),
        (vec!["--groups", "1e9"], "1 to 100"),
        (vec!["--groups", "2", "--pick-list", "-", "--json"], "both go to standard output"),
        (vec!["--groups", "2", "--holes", "-", "--shafts", "-"], "standard input can be read only once"),
        (vec!["--groups", "2", "--holes", "holes.csv", "--pick-list", "holes.csv"], "would be overwritten"),
        (vec!["--groups", "2", "--pick-list", "no/pairs.csv"], "the folder no does not exist"),
    ] {
        let all: Vec<&str> = ["sort", &file, "--band", "52 to 66 um"].into_iter().chain(arguments).collect();
        let output = hubgrip_in(here.path(), &all);
        assert_eq!((output.status.code(), stdout(&output).as_str()), (Some(2), ""), "{all:?}");
        assert!(stderr(&output).contains(message), "{all:?}: {}", stderr(&output));
        assert!(!stderr(&output).contains(".hubgrip-"), "{}", stderr(&output));
    }
    // A band below zero is one of clearances.
    let output = hubgrip_in(here.path(), &["sort", &file, "--groups", "2", "--band", "-10 to 60 um"]);
    assert!(output.status.code().unwrap() < 2, "{}", stderr(&output));
}
