//! Numbers and names that no joint can have: refused at their place before anything is computed from them.

mod joint_support;

use joint_support::{FULL, LEAST, case, check, faults, joint, listed, place, set};

const BEARING: &str = "\
joint_file: 1
length: 20 mm
shaft: {material: C45+N}
hub: {bearing: {bore: 50 mm, outside_diameter: 90 mm, width: 20 mm}}
fit: k5
";

const RINGS: &str = "\
joint_file: 1
length: 60 mm
rings:
  - {name: core, material: C45+N, bore: 10 mm, outer_diameter: 40 mm}
  - {material: C45+N, outer_diameter: 60 mm}
  - {name: jacket, material: C45+N, outer_diameter: 90 mm}
fits: [H7/s6, H7/s6]
";

#[test]
fn a_seat_is_no_longer_than_its_bearing_is_wide() {
    joint(BEARING);
    joint(&BEARING.replace("length: 20 mm", "length: 18 mm"));
    let told = "length 70 mm is more than the width 20 mm of the bearing";
    check(BEARING, &[case(("length: 20 mm", "length: 70 mm"), (2, 9, 5), told, "")]);
}

#[test]
fn two_parts_do_not_share_a_name() {
    joint(RINGS);
    let own = "give each part a name of its own";
    check(
        RINGS,
        &[
            case(("name: jacket", "name: core"), (6, 12, 4), "two parts are called `core`", own),
            // The second ring, which has no name in the file, goes by its number.
            case(("name: jacket", "name: ring 2"), (6, 12, 6), "two parts are called `ring 2`", own),
            case(("name: core", "name: ring 2"), (4, 12, 6), "two parts are called `ring 2`", own),
        ],
    );
    let told = "two parts are called `pin`";
    check(FULL, &[case(("name: web", "name: pin"), (11, 9, 3), told, own)]);
}

#[test]
fn numbers_that_no_part_can_have_are_refused() {
    let no_number = "is no number that a part can have";
    check(
        FULL,
        &[
            case(
                ("torque: 900 N.m", "torque: 1e154 N.m"),
                (19, 28, 9),
                "1e154 N.m is no number that a part can have",
                "check the exponent and the unit",
            ),
            case(
                ("length: 70 mm", "length: 1e19 mm"),
                (7, 9, 7),
                "1e19 mm is no number that a part can have",
                "unit",
            ),
        ],
    );
    let found = set(FULL, &[("duty.rated.speed", "1e154 rpm")]).unwrap_err();
    assert!(found[0].message.contains(no_number), "{}", listed(&found));
    let tiny = "is less than 1 nm, which no part is";
    for (text, from, to) in [
        (FULL, "diameter: 60 mm\n", "diameter: 1e-300 mm\n"),
        (FULL, "length: 70 mm", "length: 0.9 nm"),
        (FULL, "relief: 3 mm", "relief: 1e-300 mm"),
        (FULL, "bore: 20 mm", "bore: 1e-12 mm"),
        (FULL, "outer_diameter: 110 mm", "outer_diameter: 1e-10 m"),
        (RINGS, "bore: 10 mm", "bore: 1e-12 mm"),
        (BEARING, "width: 20 mm", "width: 1e-300 mm"),
    ] {
        assert!(text.contains(from), "{from}");
        let found = faults(&text.replacen(from, to, 1));
        let value = to.trim().replace(": ", " ");
        assert!(
            found.iter().any(|fault| fault.message == format!("{value} {tiny}") && fault.place.is_some()),
            "{to}: {}",
            listed(&found)
        );
    }
    joint(&RINGS.replace("bore: 10 mm", "bore: 0 mm"));
    joint(&FULL.replace("relief: 3 mm", "relief: 0 mm"));
}

#[test]
fn a_key_has_one_dot_between_its_words() {
    for (key, told) in [
        ("hub.outer_diameter.", "the key ends with a dot"),
        ("fit.", "the key ends with a dot"),
        (".", "the key ends with a dot"),
        ("hub..outer_diameter", "nothing stands before a dot of the key"),
        (".fit", "nothing stands before a dot of the key"),
    ] {
        let found = set(LEAST, &[(key, "130mm")]).unwrap_err();
        assert_eq!(found.len(), 1, "{}", listed(&found));
        assert_eq!(found[0].message, format!("--set {key}: {told}"));
        assert!(found[0].help.is_some());
    }
}

#[test]
fn a_part_is_chilled_where_it_enters_and_there_is_time_to_seat_it() {
    let cold = hubgrip::joint::template::find(Some("cold")).expect("there is one").text;
    let told = |changes: &[(&str, &str)]| -> Vec<String> {
        match set(cold, changes) {
            Ok(_) => Vec::new(),
            Err(found) => found.into_iter().map(|fault| fault.message).collect(),
        }
    };
    // The seat is the length of 45 mm less a relief of 2 mm.
    let too_short = "is less than the seat of 43 mm: what stays warm does not enter";
    for (length, right) in [("1um", false), ("42.9mm", false), ("43mm", true), ("60mm", true)] {
        let found = told(&[("assembly.chilled_length", length)]);
        let wanted = format!("--set assembly.chilled_length: chilled_length {length} {too_short}");
        assert_eq!(found, if right { vec![] } else { vec![wanted] });
    }
    // The template needs 8 s from the bath to seated.
    for (time, right) in [("7.9s", true), ("8s", false), ("20s", false)] {
        let found = told(&[("assembly.transfer_time", time)]);
        let wanted = format!(
            "--set assembly.transfer_time: transfer_time {time} leaves nothing of the handling_time 8 s to seat the part in"
        );
        assert_eq!(found, if right { vec![] } else { vec![wanted] });
    }
    let text = cold.replace("  # chilled_length: 45 mm  ", "  chilled_length: 1 um  ");
    let found = faults(&text);
    assert_eq!(found.len(), 1, "{}", listed(&found));
    let line = text.lines().position(|line| line.contains("chilled_length")).expect("the line is there") + 1;
    assert_eq!(place(&found[0]), Some((line, 19, 4)));
}
