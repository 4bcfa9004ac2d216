//! A table of joints, held against the single check; its errors, its bytes, its files.

mod common;
mod random_joints;

use std::collections::BTreeMap;
use std::fs;
use std::path::Path;
use std::process::{Command, Stdio};

use hubgrip::findings::compute;
use hubgrip::joint::read;
use hubgrip::material::library::Library;
use hubgrip::population::batch::{BatchError, Settings, Summary, column_names, run};
use rand::RngExt;

const BASE: &str = "\
joint_file: 1
length: 70 mm
shaft: {material: C45+N, roughness: Rz 6.3 um}
hub: {material: C45+N, roughness: Rz 10 um}
friction: {holding: 0.12, pressing: 0.08 to 0.14}
duty:
  - {state: rated, torque: 200 N.m, axial_force: 2 kN}
  - {state: warm, torque: 100 N.m, shaft_temperature: 60 degC, hub_temperature: 45 degC}
";

fn settings(base: &str) -> Settings {
    Settings { base: Some(base.to_owned()), base_name: "base.yaml".into(), ..Settings::default() }
}

fn worked(table: &[u8], settings: &Settings) -> (String, Summary) {
    let mut output = Vec::new();
    let summary = run(table, &mut output, None, settings, &Library::built_in(), &mut |_| ()).unwrap();
    (String::from_utf8(output).unwrap(), summary)
}

/// The rows of an output, each by the heads of its columns.
fn rows(output: &str) -> Vec<BTreeMap<String, String>> {
    let mut reader = csv::Reader::from_reader(output.as_bytes());
    let heads = reader.headers().unwrap().clone();
    let records = reader.records().map(Result::unwrap);
    records
        .map(|record| heads.iter().map(str::to_owned).zip(record.iter().map(str::to_owned)).collect())
        .collect()
}

#[track_caller]
fn same(found: &str, full: Option<f64>, factor: f64) {
    match full {
        None => assert_eq!(found, ""),
        Some(full) => {
            let found: f64 = found.parse().unwrap();
            let allowed = 1e-11 * (full * factor).abs().max(1e-6);
            assert!((found - full * factor).abs() <= allowed, "{found} and {}", full * factor);
        }
    }
}

/// The columns of a varied table: head, key, what stands before and behind a plain number, cells of which the last
/// ones are rare and mostly wrong.
const VARIED: [(&str, &str, &str, &str, &[&str]); 17] = [
    ("length", "length", "", "", &["70 mm", "55 mm", "3 in", "1.5 mm", "70"]),
    ("relief (mm)", "relief", "", " mm", &["2", "0", "2 um", "", "-1"]),
    ("hub.roughness (Rz um)", "hub.roughness", "Rz ", " um", &["6.3", "10", "Ra 0.8 um", "", "-3"]),
    ("shaft.roughness", "shaft.roughness", "", "", &["Rz 4 um", "Ra 0.8 um", "", "4 um", "Rz 4"]),
    ("fit", "fit", "", "", &["H7/s6", "H7/u6", "FN 2", "S7/h6", "H7-p6", "H8/x8", "h7/s6", "H7/zz9"]),
    ("friction.holding", "friction.holding", "", "", &["0.12", "0.1 to 0.2", "", "0.2 to 0.1", "1.5"]),
    ("friction.pressing", "friction.pressing", "", "", &["0.1", "0.08 to 0.14", "", "0", "x"]),
    ("duty.rated.torque (N.m)", "duty.rated.torque", "", " N.m", &["200", "350.5", "1 kN.m", "0", "-5"]),
    (
        "duty.1.shaft_temperature (degC)",
        "duty.1.shaft_temperature",
        "",
        " degC",
        &["40", "20", "120.5 degF", "900"],
    ),
    ("duty.rated.speed (rpm)", "duty.rated.speed", "", " rpm", &["0", "3000", "1e3", "-1"]),
    ("duty.1.bending_moment (N.m)", "duty.1.bending_moment", "", " N.m", &["0", "12", "", "-2"]),
    ("duty.0.outer_pressure (MPa)", "duty.0.outer_pressure", "", " MPa", &["0", "2.5", "", "-2"]),
    ("require.slip_safety", "require.slip_safety", "", "", &["1.5", "2", "", "0", "1.5 mm"]),
    ("require.press_force (kN)", "require.press_force", "", " kN", &["200", "50 kN", "", "0"]),
    ("assembly.clearance (um)", "assembly.clearance", "", " um", &["50", "0", "", "-1"]),
    ("hub.material", "hub.material", "", "", &["", "C45+N", "EN-GJL-250", "42CrMo4+QT", "nothing"]),
    ("title", "title", "", "", &["a hub", "another", "", "{x"]),
];

/// A table in which everything that is put in straight varies, with and without units, and cells left empty.
fn varied(count: usize, seed: u64) -> String {
    let mut random = random_joints::stream(seed);
    let mut table = "diameter (mm),shaft.bore (mm),hub.outer_diameter (mm)".to_owned();
    for (head, ..) in VARIED {
        table += &format!(",{head}");
    }
    table += "\n";
    for _ in 0..count {
        let diameter = 10f64.powf(random.random_range(0.7..2.4));
        let wide = if random.random_bool(0.02) { 0.9 } else { 1.7 };
        let bore = if random.random_bool(0.3) { String::new() } else { format!("{:.2}", 0.3 * diameter) };
        table += &format!("{diameter:.3},{bore},{:.1}", wide * diameter);
        for (_, _, _, _, cells) in VARIED {
            let usual = cells.len() - 2;
            let number = if random.random_bool(0.03) {
                random.random_range(0..cells.len())
            } else {
                random.random_range(0..usual)
            };
            table += &format!(",{}", cells[number]);
        }
        table += "\n";
    }
    table
}

/// The joint file with the cells of a row set in it is the same joint: same errors, same numbers.
#[test]
fn every_row_is_what_the_single_check_gives() {
    let library = Library::built_in();
    let table = varied(600, 3);
    let (output, summary) = worked(table.as_bytes(), &settings(BASE));
    let found = rows(&output);
    assert_eq!((found.len(), summary.rows), (600, 600));
    let sizes = [
        ("diameter (mm)", "diameter", "", " mm"),
        ("shaft.bore (mm)", "shaft.bore", "", " mm"),
        ("hub.outer_diameter (mm)", "hub.outer_diameter", "", " mm"),
    ];
    let columns = || VARIED.into_iter().map(|(head, key, before, behind, _)| (head, key, before, behind));
    let (mut good, mut bad) = (0, 0);
    for (number, row) in found.iter().enumerate() {
        let mut set = Vec::new();
        for (head, key, before, behind) in sizes.into_iter().chain(columns()) {
            let cell = row[head].as_str();
            let plain = cell.parse::<f64>().is_ok();
            let text = if plain { format!("{before}{cell}{behind}") } else { cell.to_owned() };
            if !text.is_empty() {
                set.push((key.to_owned(), text));
            }
        }
        let full = read::read(BASE, Path::new("base.yaml"), &set, &library).map(compute);
        match full {
            Ok(Ok(findings)) => {
                assert_eq!(row["errors"], "", "row {number} {set:?}");
                good += 1;
                let tightest = &findings.extremes.tightest;
                same(&row["tightest.pressure_mpa"], Some(tightest.pressure), 1e-6);
                same(&row["tightest.interference_um"], Some(tightest.interference), 1e6);
                same(&row["tightest.hub_bore_von_mises_mpa"], Some(tightest.rings[1].bore.von_mises), 1e-6);
                same(&row["tightest.press_force_n"], Some(tightest.press_force.high), 1.0);
                same(
                    &row["loosest.torque_capacity_nm"],
                    Some(findings.extremes.loosest.torque_capacity),
                    1.0,
                );
                let least = |subject: &str| {
                    let all = findings.verdicts.iter().filter(|verdict| verdict.subject.starts_with(subject));
                    all.filter_map(|verdict| verdict.found).min_by(f64::total_cmp)
                };
                same(&row["slip_safety"], least("safety against slip"), 1.0);
                same(&row["shaft_safety"], least("shaft safety against"), 1.0);
                same(&row["hub_safety"], least("hub safety against"), 1.0);
                let ok = findings.verdicts.iter().all(|verdict| verdict.ok);
                assert_eq!(row["ok"], ok.to_string(), "row {number}");
            }
            Ok(Err(error)) => assert!(row["errors"].contains(&error.to_string()), "row {number}"),
            Err(faults) => {
                bad += 1;
                let first = faults[0].message.strip_prefix("--set ").unwrap_or(&faults[0].message);
                let told = format!("line {}: ", number + 2);
                assert!(row["errors"].starts_with(&told), "{}", row["errors"]);
                assert!(row["errors"].contains(first), "row {number}: {} for {first}", row["errors"]);
                assert_eq!(row["slip_safety"], "");
            }
        }
    }
    assert!(good > 250 && bad > 60, "{good} good and {bad} bad rows");
    assert_eq!(summary.bad, found.iter().filter(|row| !row["errors"].is_empty()).count() as u64);
}

/// A row gives the same bytes whatever its neighbours are, and whatever was read before it.
#[test]
fn a_row_does_not_depend_on_its_neighbours() {
    let table = varied(300, 4);
    let (output, _) = worked(table.as_bytes(), &settings(BASE));
    let (head, lines) = table.split_once('\n').unwrap();
    let mut reversed: Vec<&str> = lines.lines().collect();
    reversed.reverse();
    let (backwards, _) = worked(format!("{head}\n{}\n", reversed.join("\n")).as_bytes(), &settings(BASE));
    let without_place = |line: &str| {
        let at = line.rfind(",\"line ").or_else(|| line.rfind(",line ")).unwrap_or(line.len());
        line[..at].to_owned()
    };
    let forwards: Vec<String> = output.lines().skip(1).map(without_place).collect();
    let mut back: Vec<String> = backwards.lines().skip(1).map(without_place).collect();
    back.reverse();
    assert_eq!(forwards, back);
}

#[test]
fn measured_parts_come_a_row_each() {
    let base = BASE
        .replace("length: 70 mm", "length: 70 mm\ndiameter: 60 mm\nfit: {measured: {uncertainty: 2 um}}")
        .replace("hub: {material: C45+N", "hub: {material: C45+N, outer_diameter: 120 mm");
    let table = "fit.measured.hole (mm),fit.measured.shaft (mm)\n60.012,60.061\n60.020,60.055\n60.012,80\n";
    let (output, summary) = worked(table.as_bytes(), &settings(&base));
    let found = rows(&output);
    assert_eq!(found[0]["loosest.interference_um"], "45.0");
    assert_eq!(found[0]["tightest.interference_um"], "53.0");
    assert_eq!((found[1]["hole_lower_um"].as_str(), found[1]["hole_upper_um"].as_str()), ("18.0", "22.0"));
    assert!(found[2]["errors"].starts_with("line 4: fit"), "{}", found[2]["errors"]);
    assert_eq!(summary.bad, 1);
}

/// Limits as columns: deviations, sizes, one member alone; a row with wrong ones says what the single check says.
#[test]
fn limits_come_a_row_each() {
    let base = BASE.replace("hub: {material: C45+N", "hub: {material: C45+N, outer_diameter: 120 mm");
    let at_sixty = base.replace("length: 70 mm", "length: 70 mm\ndiameter: 60 mm");
    let kept_hole = format!("{at_sixty}fit: {{hole: H7}}\n");
    let deviations = "fit.hole.lower (um),fit.hole.upper (um),fit.shaft.lower (um),fit.shaft.upper (um)";
    let sizes = "fit.hole.min (mm),fit.hole.max (mm),fit.shaft.min (mm),fit.shaft.max (mm)";
    for (base, head, table) in [
        (
            &base,
            format!("diameter (mm),{deviations}"),
            vec!["60,0,30,53,72", "58,0,30,53,72", "60,-9,10,40 um,0.05 mm"],
        ),
        (&at_sixty, deviations.to_owned(), vec!["0,30,53,72", "0,30,53,52", "0,30,5,9000", "0,,53,72"]),
        (
            &at_sixty,
            sizes.to_owned(),
            vec!["60,60.03,60.053,60.072", "60,60.03,60.08,60.07", "-1,60,60.1,60.2"],
        ),
        (&kept_hole, "fit.shaft.lower (um),fit.shaft.upper (um)".to_owned(), vec!["53,72", "60,61", "x,72"]),
    ] {
        let keys: Vec<&str> = head.split(',').map(|name| name.split(' ').next().unwrap()).collect();
        let units = head.split(',').map(|name| name.split(['(', ')']).nth(1).unwrap());
        let units: Vec<&str> = units.collect();
        let (output, _) = worked(format!("{head}\n{}\n", table.join("\n")).as_bytes(), &settings(base));
        for (found, line) in rows(&output).iter().zip(&table) {
            let cells = line.split(',').zip(keys.iter().zip(&units)).filter(|(cell, _)| !cell.is_empty());
            let set: Vec<(String, String)> = cells
                .map(|(cell, (key, unit))| {
                    let plain = cell.parse::<f64>().is_ok();
                    ((*key).to_owned(), if plain { format!("{cell} {unit}") } else { cell.to_owned() })
                })
                .collect();
            match read::read(base, Path::new("base.yaml"), &set, &Library::built_in()) {
                Ok(joint) => {
                    let findings = compute(joint).unwrap();
                    assert_eq!(found["errors"], "", "{line}");
                    same(
                        &found["loosest.interference_um"],
                        Some(findings.extremes.loosest.interference),
                        1e6,
                    );
                    same(&found["tightest.pressure_mpa"], Some(findings.extremes.tightest.pressure), 1e-6);
                }
                Err(faults) => {
                    let first = faults[0].message.strip_prefix("--set ").unwrap_or(&faults[0].message);
                    assert!(found["errors"].contains(first), "{line}: {} for {first}", found["errors"]);
                }
            }
        }
    }
}

/// A time from oven to seated that is required is followed for each row, and the share that relaxation leaves counts.
#[test]
fn handling_time_and_relaxation_are_judged_as_the_check_does() {
    let base = "joint_file: 1\ndiameter: 60 mm\nlength: 70 mm\nfriction: 0.12\nfit: H7/s6\n\
        shaft: {material: C45+N}\nhub: {material: C45+N, outer_diameter: 120 mm}\n\
        duty: [{state: rated, torque: 200 N.m}]\nassembly: {method: heat hub}\n";
    let table = "assembly.handling_time (s),duty.0.relaxation,require.hub_temperature (degC)\n\
        ,,\n1,,\n3600,,\n3600,,100\n,0.9,\n,0.1,\n1,0.1,\n";
    let (output, _) = worked(table.as_bytes(), &settings(base));
    let found = rows(&output);
    let told = |column: &str| found.iter().map(|row| row[column].clone()).collect::<Vec<_>>();
    let (yes, no) = ("met", "not met");
    assert_eq!(told("assembly"), [yes, yes, no, no, yes, yes, yes]);
    assert_eq!(told("hold"), [yes, yes, yes, yes, yes, no, no]);
    let cells = table.lines().skip(1).map(|line| line.split(',').collect::<Vec<_>>());
    for (row, cells) in found.iter().zip(cells) {
        let keys = [
            ("assembly.handling_time", " s"),
            ("duty.0.relaxation", ""),
            ("require.hub_temperature", " degC"),
        ];
        let set: Vec<(String, String)> = keys
            .iter()
            .zip(cells)
            .filter(|(_, cell)| !cell.is_empty())
            .map(|((key, unit), cell)| ((*key).to_owned(), format!("{cell}{unit}")))
            .collect();
        let findings =
            compute(read::read(base, Path::new("b.yaml"), &set, &Library::built_in()).unwrap()).unwrap();
        let ok = findings.verdicts.iter().all(|verdict| verdict.ok);
        assert_eq!(row["ok"], ok.to_string(), "{set:?}");
        same(&row["slip_safety"], findings.duty[0].loosest.slip_safety, 1.0);
    }
}

/// What the kernel does not cover is worked out in full.
#[test]
fn joints_of_every_kind_go_through() {
    for file in common::examples() {
        let text = fs::read_to_string(&file).unwrap();
        let (output, _) = worked(b"require.slip_safety\n1.5\n1.5\n", &settings(&text));
        let found = rows(&output);
        assert_eq!(found[0]["errors"], "", "{}", file.display());
        let set = [("require.slip_safety".to_owned(), "1.5".to_owned())];
        let joint = read::read(&text, &file, &set, &Library::built_in()).unwrap();
        let findings = compute(joint).unwrap();
        same(&found[0]["loosest.pressure_mpa"], Some(findings.extremes.loosest.pressure), 1e-6);
        let ok = findings.verdicts.iter().all(|verdict| verdict.ok);
        assert_eq!(found[0]["ok"], ok.to_string(), "{}", file.display());
        assert_eq!(found[0], found[1]);
    }
}

#[test]
fn each_kind_of_error_stays_in_its_row() {
    let table = "\
id,diameter (mm),hub.outer_diameter (mm),fit,duty.0.torque (N.m)
good,60,120,H7/s6,100
few,60,120
many,60,120,H7/s6,100,7
unit,60 MPa,120,H7/s6,100
word,sixty,120,H7/s6,100
order,60,50,H7/s6,100
class,60,120,H7/zz6,100
undefined,4000,9000,H7/s6,100
negative,60,120,H7/s6,-1
missing,,120,H7/s6,100
comma,\"60,5\",120,H7/s6,100
large,60,120,H7/s6,1e999
last,60,120,H7/s6,100
";
    let settings = Settings { keep: vec!["id".to_owned()], ..settings(BASE) };
    let (output, summary) = worked(table.as_bytes(), &settings);
    let found = rows(&output);
    assert_eq!((summary.rows, summary.met, summary.bad), (13, 2, 11));
    assert_eq!(summary.first_bad.as_ref().unwrap().0, 3);
    for (number, row) in found.iter().enumerate() {
        let (id, errors) = (row["id"].as_str(), row["errors"].as_str());
        if ["good", "last"].contains(&id) {
            assert_eq!((errors, row["ok"].as_str()), ("", "true"), "{id}");
        } else {
            assert!(errors.starts_with(&format!("line {}: ", number + 2)), "{id}: {errors}");
            assert_eq!(row["ok"], "", "{id}");
        }
    }
    let error = |id: &str| found.iter().find(|row| row["id"] == id).unwrap()["errors"].clone();
    assert!(error("few").contains("3 cells, the head has 5"));
    assert!(error("unit").contains("diameter"));
    assert!(error("order").contains("not larger than the mating diameter"));
    assert!(error("missing").contains("`diameter` is missing"), "{}", error("missing"));
}

#[test]
fn errors_can_go_apart() {
    let table = "diameter (mm),hub.outer_diameter (mm),fit\n60,120,H7/s6\n60,50,H7/s6\n\n60,120,nothing\n60,130,H7/s6\n";
    let (mut output, mut errors) = (Vec::new(), Vec::new());
    let library = Library::built_in();
    let summary =
        run(table.as_bytes(), &mut output, Some(&mut errors), &settings(BASE), &library, &mut |_| ())
            .unwrap();
    let (output, errors) = (String::from_utf8(output).unwrap(), String::from_utf8(errors).unwrap());
    assert_eq!(rows(&output).len(), 2);
    assert!(!output.contains("errors"));
    let lines: Vec<String> = rows(&errors).iter().map(|row| row["line"].clone()).collect();
    // The blank line counts as a line, not as a row.
    assert_eq!(lines, ["3", "5"]);
    assert_eq!((summary.rows, summary.bad), (4, 2));
}

/// Lines are those of an editor: blank ones, quoted line breaks, both ends of line, a mark at the beginning.
#[test]
fn lines_are_counted_as_an_editor_does() {
    let bad = |end: &str, mark: &str, last: &str| {
        let rows = ["id,fit", "a,x", "", "\"b", "c\",x", "", "", "d,x"].join(end);
        let settings = Settings { keep: vec!["id".to_owned()], ..settings(BASE) };
        let (_, summary) = worked(format!("{mark}{rows}{last}").as_bytes(), &settings);
        let mut errors = Vec::new();
        let library = Library::built_in();
        let table = format!("{mark}{rows}{last}");
        run(table.as_bytes(), &mut Vec::new(), Some(&mut errors), &settings, &library, &mut |_| ()).unwrap();
        let errors = String::from_utf8(errors).unwrap();
        assert_eq!(summary.bad, 3);
        rows_lines(&errors)
    };
    for end in ["\n", "\r\n"] {
        for mark in ["", "\u{feff}"] {
            for last in ["", end] {
                assert_eq!(bad(end, mark, last), ["2", "4", "8"], "{end:?} {mark:?} {last:?}");
            }
        }
    }
}

fn rows_lines(errors: &str) -> Vec<String> {
    rows(errors).iter().map(|row| row["line"].clone()).collect()
}

#[test]
fn spreadsheets_are_read_and_kept_from_running_cells() {
    let table = "\u{feff}id,diameter (mm),hub.outer_diameter (mm),fit,hub.name\r\n\
                 \"=HYPERLINK(\"\"x\"\")\",60,120,H7/s6,@hub\r\n-5,60,120,H7/s6,\"a, b\"\r\n";
    let settings = Settings { keep: vec!["id".to_owned()], columns: vec!["ok".to_owned()], ..settings(BASE) };
    let (output, summary) = worked(table.as_bytes(), &settings);
    assert_eq!((summary.rows, summary.bad), (2, 0), "{output}");
    assert!(output.starts_with("id,diameter (mm)"));
    assert!(output.contains("\n\"'=HYPERLINK(\"\"x\"\")\",60,120,H7/s6,'@hub,true,\n"), "{output}");
    assert!(output.contains("\n-5,60,120,H7/s6,\"a, b\",true,\n"), "{output}");
}

#[test]
fn heads_are_refused_before_the_first_row() {
    let library = Library::built_in();
    let refused = |table: &str, settings: &Settings| match run(
        table.as_bytes(),
        &mut Vec::new(),
        None,
        settings,
        &library,
        &mut |_| (),
    ) {
        Err(BatchError::Head(faults)) => {
            faults.iter().map(|fault| format!("{} {:?}", fault.message, fault.help)).collect::<String>()
        }
        other => panic!("{other:?}"),
    };
    assert!(refused("diameter;fit\n60;H7/s6\n", &settings(BASE)).contains("separator is `;`"));
    assert!(refused("diameter\tfit\n", &settings(BASE)).contains("separator is a tab"));
    assert!(refused("diamter\n60 mm\n", &settings(BASE)).contains("did you mean `diameter`"));
    assert!(refused("", &settings(BASE)).contains("the table is empty"));
    let wanted = Settings { columns: vec!["slip_safty".to_owned()], ..settings(BASE) };
    assert!(refused("diameter\n", &wanted).contains("did you mean `slip_safety`"));
    assert!(column_names().contains(&"tightest.pressure_mpa"));
}

#[test]
fn a_quote_without_end_does_not_swallow_the_memory() {
    let mut table = b"diameter (mm),fit\n60,\"H7/s6\n".to_vec();
    table.extend(std::iter::repeat_n(b'x', 3 << 20));
    let library = Library::built_in();
    let error =
        run(table.as_slice(), &mut Vec::new(), None, &settings(BASE), &library, &mut |_| ()).unwrap_err();
    assert!(matches!(error, BatchError::Input { .. }) && error.to_string().contains("quote"), "{error}");
    let not_utf8 = b"diameter (mm),hub.outer_diameter (mm),fit\n60,120,H7/s6\n60,120,H7\xff/s6\n";
    let (output, summary) = worked(not_utf8, &settings(BASE));
    assert_eq!(summary.bad, 1);
    assert!(output.contains("line 3: fit: a character here is not UTF-8"), "{output}");
}

fn table_of(count: usize) -> String {
    let mut table = "diameter (mm),hub.outer_diameter (mm),fit,duty.rated.torque (N.m)\n".to_owned();
    for number in 0..count {
        let diameter = 40 + number % 60;
        table += &format!("{diameter},{},H7/s6,{}\n", 2 * diameter, 100 + number % 977);
    }
    table
}

#[test]
fn one_and_two_threads_give_the_same_bytes() {
    let folder = tempfile::tempdir().unwrap();
    fs::write(folder.path().join("base.yaml"), BASE).unwrap();
    fs::write(folder.path().join("table.csv"), varied(3000, 5) + &table_of(0)).unwrap();
    let with_threads = |threads: &str| {
        Command::new(env!("CARGO_BIN_EXE_hubgrip"))
            .args(["batch", "table.csv", "--base", "base.yaml", "--quiet"])
            .current_dir(folder.path())
            .env("RAYON_NUM_THREADS", threads)
            .output()
            .unwrap()
    };
    let (one, two) = (with_threads("1"), with_threads("2"));
    assert_eq!(one.status.code(), Some(1), "{}", common::stderr(&one));
    assert!(one.stdout == two.stdout && one.stdout.len() > 100_000);
}

#[test]
fn pipes_and_files_hold_the_same() {
    let folder = tempfile::tempdir().unwrap();
    fs::write(folder.path().join("base.yaml"), BASE).unwrap();
    let table = table_of(500);
    fs::write(folder.path().join("table.csv"), &table).unwrap();
    let arguments = ["batch", "table.csv", "--base", "base.yaml", "-o", "out.csv", "--errors", "bad.csv"];
    let output = common::hubgrip_in(folder.path(), &arguments);
    assert!(output.stdout.is_empty() && output.status.code() < Some(2));
    assert!(common::stderr(&output).contains("500 rows: "), "{}", common::stderr(&output));
    assert_eq!(fs::read_to_string(folder.path().join("bad.csv")).unwrap(), "line,error\n");
    let mut child = Command::new(env!("CARGO_BIN_EXE_hubgrip"))
        .args(["batch", "-", "--base", "base.yaml", "--errors", "bad.csv", "--quiet"])
        .current_dir(folder.path())
        .stdin(Stdio::piped())
        .stdout(Stdio::piped())
        .spawn()
        .unwrap();
    let mut stdin = child.stdin.take().unwrap();
    let writer = std::thread::spawn(move || std::io::Write::write_all(&mut stdin, table.as_bytes()));
    let piped = child.wait_with_output().unwrap();
    writer.join().unwrap().unwrap();
    assert_eq!(
        String::from_utf8(piped.stdout).unwrap(),
        fs::read_to_string(folder.path().join("out.csv")).unwrap()
    );
}

/// Killed half-way: what stood under the final name still stands, and nothing half-written does.
#[test]
fn a_killed_run_leaves_no_final_file() {
    let folder = tempfile::tempdir().unwrap();
    fs::write(folder.path().join("base.yaml"), BASE).unwrap();
    fs::write(folder.path().join("old.csv"), "old\n").unwrap();
    for name in ["new.csv", "old.csv"] {
        let mut child = Command::new(env!("CARGO_BIN_EXE_hubgrip"))
            .args(["batch", "-", "--base", "base.yaml", "-o", name, "--errors", "bad.csv"])
            .current_dir(folder.path())
            .stdin(Stdio::piped())
            .spawn()
            .unwrap();
        let mut stdin = child.stdin.take().unwrap();
        std::io::Write::write_all(&mut stdin, table_of(20_000).as_bytes()).unwrap();
        let growing = || {
            let entries = fs::read_dir(folder.path()).unwrap().map(|entry| entry.unwrap());
            entries
                .filter(|entry| entry.file_name().to_string_lossy().starts_with(".hubgrip-"))
                .any(|entry| entry.metadata().unwrap().len() > 0)
        };
        for _ in 0..600 {
            if growing() {
                break;
            }
            std::thread::sleep(std::time::Duration::from_millis(50));
        }
        assert!(growing(), "nothing was written while the table came in");
        child.kill().unwrap();
        child.wait().unwrap();
        drop(stdin);
        for entry in fs::read_dir(folder.path()).unwrap().map(Result::unwrap) {
            if entry.file_name().to_string_lossy().starts_with(".hubgrip-") {
                fs::remove_file(entry.path()).unwrap();
            }
        }
    }
    assert!(!folder.path().join("new.csv").exists() && !folder.path().join("bad.csv").exists());
    assert_eq!(fs::read_to_string(folder.path().join("old.csv")).unwrap(), "old\n");
}

/// Nothing that is read is written over, and table and base in each other's place are told apart.
#[test]
fn mixed_up_files_are_told() {
    let folder = tempfile::tempdir().unwrap();
    let table = "diameter (mm),fit\n60,H7/s6\n";
    fs::write(folder.path().join("table.csv"), table).unwrap();
    fs::write(folder.path().join("base.yaml"), BASE).unwrap();
    fs::write(folder.path().join("empty.csv"), "").unwrap();
    fs::write(folder.path().join("wide.csv"), b"\xff\xfed\0i\0a\0").unwrap();
    for (words, told) in [
        (
            vec!["table.csv", "--base", "base.yaml", "-o", "table.csv"],
            "table.csv: error: --output names an input",
        ),
        (vec!["table.csv", "--base", "base.yaml", "-o", "./base.yaml"], "--output names an input"),
        (vec!["table.csv", "--base", "base.yaml", "--errors", "table.csv"], "--errors names an input"),
        (vec!["base.yaml", "--base", "base.yaml"], "hubgrip batch TABLE.csv --base JOINT.yaml"),
        (vec!["-", "--base", "-"], "standard input can be read only once"),
        (vec!["empty.csv", "--base", "base.yaml"], "empty.csv: error: the table is empty"),
        (vec!["wide.csv", "--base", "base.yaml"], "not text in UTF-8"),
        (vec!["none.csv", "--base", "base.yaml"], "name a table"),
        (vec!["table.csv", "--base", "base.yaml", "-o", "no/out.csv"], "the folder no does not exist"),
    ] {
        let output = common::hubgrip_in(folder.path(), &[&["batch"], words.as_slice()].concat());
        let errors = common::stderr(&output);
        assert_eq!((output.status.code(), output.stdout.len()), (Some(2), 0), "{words:?}: {errors}");
        assert!(errors.contains(told) && !errors.contains(".hubgrip-"), "{words:?}: {errors}");
    }
    assert_eq!(fs::read_to_string(folder.path().join("table.csv")).unwrap(), table);
    assert_eq!(fs::read_to_string(folder.path().join("base.yaml")).unwrap(), BASE);
}

#[test]
fn bad_input_of_the_command_is_told() {
    let folder = tempfile::tempdir().unwrap();
    fs::write(folder.path().join("base.yaml"), "length: [70 mm\n").unwrap();
    fs::write(folder.path().join("good.yaml"), BASE).unwrap();
    fs::write(folder.path().join("table.csv"), "id,diameter (mm)\n1,60\n").unwrap();
    let told = |arguments: &[&str]| {
        let output = common::hubgrip_in(folder.path(), &[&["batch"], arguments].concat());
        assert_eq!(output.status.code(), Some(2), "{}", common::stderr(&output));
        common::stderr(&output)
    };
    assert!(told(&["table.csv", "--base", "base.yaml"]).contains("base.yaml:1"));
    assert!(told(&["table.csv", "--base", "good.yaml"]).contains("table.csv:1:1: error: the column `id`"));
    assert!(told(&["none.csv"]).contains("none.csv"));
    let same = ["table.csv", "--keep", "id", "-o", "x.csv", "--errors", "x.csv"];
    assert!(told(&same).contains("same place"));
    assert!(told(&["table.csv", "--keep", "id", "--keep", "no"]).contains("no such column"));
    let listed = common::hubgrip_in(folder.path(), &["batch", "--list-columns"]);
    assert!(common::stdout(&listed).lines().any(|line| line == "slip_safety"));
}

#[test]
fn the_example_goes_through() {
    let examples = Path::new(env!("CARGO_MANIFEST_DIR")).join("examples/batch");
    let arguments = ["batch", "joints.csv", "--base", "base.yaml", "--keep", "id"];
    let output = common::hubgrip_in(&examples, &arguments);
    let found = rows(&common::stdout(&output));
    assert_eq!(found.len(), 6);
    assert!(found.iter().all(|row| row["errors"].is_empty()), "{}", common::stdout(&output));
    assert_eq!(output.status.code(), Some(if found.iter().all(|row| row["ok"] == "true") { 0 } else { 1 }));
}

/// Rows that are put straight into a joint are refused for what the joint file would be refused for.
#[test]
fn what_no_joint_can_have_is_refused_in_every_row() {
    let told = |base: &str, table: &str| -> Vec<String> {
        let (output, _) = worked(table.as_bytes(), &settings(base));
        rows(&output).iter().map(|row| row["errors"].clone()).collect()
    };
    let table = "length (mm),hub.roughness (Rz um),duty.rated.torque (N.m)\n\
                 70,6.3,100\n71,6.3,110\n0.0000009,6.3,100\n70,6300,100\n70,6.3,9999999999999999\n";
    let plain = BASE.replace("Rz 10 um}", "Rz 10 um, outer_diameter: 120 mm}\ndiameter: 60 mm");
    let found = told(&format!("{plain}fit: H7/s6\n"), table);
    assert_eq!((found[0].as_str(), found[1].as_str()), ("", ""));
    for (error, words) in found[2..].iter().zip(["less than 1 nm", "above 0.5 mm", "no number that a part"]) {
        assert!(error.contains(words), "{words}: {error}");
    }
    let measured = "fit.measured.hole (mm),fit.measured.shaft (mm),fit.measured.uncertainty (mm)\n\
                    60.01,60.06,0.002\n60.01,60.06,0.003\n60.01,60.06,2\n";
    let found = told(&plain, measured);
    assert!(found[1].is_empty() && found[2].contains("no measurement of a seat is so coarse"), "{found:?}");
    let bearing = "joint_file: 1\nshaft: {material: C45+N}\nfit: k5\n\
                   hub: {bearing: {bore: 50 mm, outside_diameter: 90 mm, width: 20 mm}}\n";
    let found = told(bearing, "length (mm)\n20\n18\n70\n");
    assert!(found[1].is_empty() && found[2].contains("more than the width 20 mm"), "{found:?}");
}
