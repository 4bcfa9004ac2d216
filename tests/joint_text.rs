//! Texts that are no joint file: not YAML, not text, hostile, mangled.

mod joint_support;

use std::path::Path;

use hubgrip::joint::read::{LARGEST, read, read_bytes};
use hubgrip::material::library::Library;
use joint_support::{FULL, LEAST, case, check, faults, joint, listed, place};
use proptest::prelude::*;

#[test]
fn text_that_is_not_yaml_is_told_in_plain_words() {
    for (text, at, message) in [
        ("joint_file: 1\nshaft:\n\tmaterial: C45\n", (3, 1, 1), "a tab indents this line"),
        (
            "joint_file: 1\nshaft: {material: C45+N\nfit: H7/s6\n",
            (2, 8, 1),
            "a brace or bracket is not closed",
        ),
        ("joint_file: 1\ntitle: \"Hub\nfit: H7/s6\n", (2, 8, 1), "a quote is not closed"),
        ("joint_file: 1\nshaft:\n  material: C45\n bore: 3 mm\n", (4, 2, 1), "a key is expected here"),
        ("joint_file: 1\ntitle: Hub: big\n", (2, 11, 1), "a second `: ` in one line"),
        (
            "joint_file: 1\n  title: Hub\n",
            (2, 8, 1),
            "a second `: ` in one line, or a line that is not indented",
        ),
        ("joint_file: 1\ndiameter:60 mm\nlength: 3 mm\n", (2, 1, 1), "a key without `: `"),
        ("joint_file: 1\ndiameter: !mm 60\n", (2, 11, 1), "a YAML tag"),
        ("joint_file: 1\n---\njoint_file: 1\n", (3, 1, 1), "a second document begins here"),
        ("joint_file: 1\n? [a, b]\n: 1\n", (2, 3, 1), "a key must be a plain word"),
        ("joint_file: 1\ntitle: @hub\n", (2, 8, 1), "a text does not begin with this sign"),
        ("title: a\u{7}b\n", (1, 9, 1), "a control character stands here"),
        ("title: a\u{2028}\nlength: @\n", (2, 9, 1), "a text does not begin with this sign"),
        ("title: *hub\n", (1, 8, 1), "an alias without its anchor"),
        ("- joint_file: 1\n", (1, 1, 15), "a joint file holds keys with values, this is a list"),
        ("diameter 60 mm", (1, 1, 14), "a joint file holds keys with values, this is one text"),
    ] {
        let found = faults(text);
        assert_eq!(found.len(), 1, "{text}");
        assert!(found[0].message.starts_with(message), "{text}: {}", found[0].message);
        assert_eq!(place(&found[0]), Some(at), "{text}");
        assert!(found[0].help.is_some(), "{text}");
    }
}

#[test]
fn what_is_not_a_joint_file_at_all_is_refused_at_once() {
    let library = Library::built_in();
    let message = |bytes: &[u8]| {
        let found = read_bytes(bytes, Path::new("demo.yaml"), &[], &library).unwrap_err();
        assert_eq!(found.len(), 1);
        (found[0].message.clone(), place(&found[0]))
    };
    for empty in ["", "\n\n", "# only a comment\n", "---\n", "\u{feff}"] {
        assert_eq!(message(empty.as_bytes()), ("the joint file is empty".to_owned(), None), "{empty:?}");
    }
    assert_eq!(message(b"\x7fELF\0\0"), ("this is not a text file: it holds NUL bytes".to_owned(), None));
    let latin = b"joint_file: 1\ntitle: Gr\xf6\xdfe\n";
    assert_eq!(message(latin), ("a character here is not UTF-8".to_owned(), Some((2, 10, 1))));
    let large = vec![b'#'; 10 << 20];
    assert_eq!(message(&large).0, "the file has 10.0 MiB, a joint file has at most 1 MiB");
    assert!(read_bytes(&vec![b'#'; LARGEST], Path::new("x"), &[], &library).is_err());
}

#[test]
fn hostile_yaml_is_refused_quickly() {
    let bomb: String = std::iter::once("a0: &a0 [x, x, x, x, x, x, x, x, x]\n".to_owned())
        .chain((1..10).map(|n| format!("a{n}: &a{n} [{}]\n", vec![format!("*a{}", n - 1); 9].join(", "))))
        .collect();
    let squared = format!("a: &a [{}]\nb: [{}]\n", vec!["x"; 1000].join(","), vec!["*a"; 100_000].join(","));
    let began = std::time::Instant::now();
    for (text, message) in [
        (bomb, "more than 100000 values"),
        (squared, "more than 100000 values"),
        ("a: &a [*a]\n".to_owned(), "nested too deeply"),
        (format!("a: {}", "[".repeat(1_000_000)), "nested too deeply"),
        ("- ".repeat(400_000), "nested too deeply"),
    ] {
        let found = faults(&text);
        assert_eq!(found[0].message, message);
    }
    let many: String = (0..20_000).map(|n| format!("k{n}: 1\n")).collect();
    let found = faults(&many);
    assert_eq!(found.len(), 21);
    assert!(found[20].message.ends_with("more faults are not shown"));
    assert!(began.elapsed().as_secs() < 30, "{:?}", began.elapsed());
}

#[test]
fn texts_that_cannot_be_meant_are_refused_unread() {
    let long = "x".repeat(300_000);
    for (from, to, message) in [
        ("fit: H7/u6", format!("fit: {long}"), "`fit` is longer than 200 characters"),
        ("C45+N", long.clone(), "`material` is longer than 200 characters"),
        ("fit: H7/u6", "fit: |\n  H7/\n  u6\n".to_owned(), "`fit` must stand on one line"),
        ("fit: H7/u6", "fit: H7/u6\ntitle: \"\\e[31mred\"".to_owned(), "`title` holds a control character"),
        ("C45+N}", "{name: \"\\e[2J\", kind: ductile}}".to_owned(), "`name` holds a control character"),
        ("fit: H7/u6", "fit: H7/u6\nnote: \"a\\nb\\rc\"".to_owned(), "`note` holds a control character"),
    ] {
        let found = faults(&LEAST.replacen(from, &to, 1));
        assert_eq!(found.len(), 1, "{}", found[0].message);
        assert_eq!(found[0].message, message);
    }
    let found = faults(&format!("{LEAST}\"{}\\e\": 1\n", "k".repeat(100)));
    assert_eq!(found[0].message, format!("unknown key `{}…`", "k".repeat(40)));
    let two = joint(&format!("{LEAST}note: |\n  one\n  two\n"));
    assert_eq!(two.note.as_deref(), Some("one\ntwo"));
}

#[test]
fn a_file_of_another_version_gets_no_further() {
    let found = faults("joint_file: 2\ndiamter: 60\n");
    assert!(found.iter().any(|fault| fault.message == "written for joint_file 2, this hubgrip reads 1"));
    assert!(found.iter().all(|fault| !fault.message.contains("missing")), "{}", listed(&found));
    check(
        LEAST,
        &[case(
            ("joint_file: 1", "joint_file: one"),
            (1, 13, 3),
            "`one` is not a version of the joint file",
            "`joint_file: 1`",
        )],
    );
}

#[test]
fn a_byte_order_mark_and_windows_lines_do_not_matter() {
    let plain = joint(LEAST);
    let other = joint(&format!("\u{feff}{}", LEAST.replace('\n', "\r\n")));
    assert_eq!(other.rings, plain.rings);
    let found = faults(&format!("\u{feff}{}", LEAST.replace("length: 70 mm\n", "length: 70\r\n")));
    assert_eq!(place(&found[0]), Some((3, 9, 2)));
}

#[test]
fn aliases_are_read_and_faults_shown_where_they_are_used() {
    let text = "\
joint_file: 1
diameter: &d 60 mm
length: 70 mm
shaft: {material: &steel C45+N, bore: *d}
hub: {material: *steel, outer_diameter: 110 mm}
fit: H7/s6
";
    let found = faults(text);
    assert_eq!(found.len(), 1);
    assert_eq!(found[0].message, "bore 60 mm is not smaller than the mating diameter 60 mm");
    assert_eq!(place(&found[0]), Some((4, 33, 4)));
    assert_eq!(joint(&text.replacen(", bore: *d", "", 1)).rings[1].material.id, "C45+N");
}

fn mutated() -> impl Strategy<Value = String> {
    let piece = prop_oneof![
        Just("\n".to_owned()),
        Just(": ".to_owned()),
        Just("- ".to_owned()),
        Just("{".to_owned()),
        Just("}".to_owned()),
        Just("&a ".to_owned()),
        Just("*a".to_owned()),
        Just("!t ".to_owned()),
        Just("\t".to_owned()),
        Just("\"".to_owned()),
        Just("|\n".to_owned()),
        Just("\u{2028}\r".to_owned()),
        Just("duty".to_owned()),
        Just("1e999 mm".to_owned()),
        "[ -~]{0,6}",
        any::<char>().prop_map(String::from),
    ];
    prop::collection::vec((0..FULL.len(), 0..12_usize, piece), 1..5).prop_map(|edits| {
        let mut text = FULL.to_owned();
        for (at, cut, put) in edits {
            let at = at.min(text.len());
            let start = (0..=at).rev().find(|&i| text.is_char_boundary(i)).unwrap_or(0);
            let end = (start + cut..=text.len()).find(|&i| text.is_char_boundary(i)).unwrap_or(text.len());
            text.replace_range(start..end, &put);
        }
        text
    })
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 400, ..ProptestConfig::default() })]

    #[test]
    fn no_text_makes_the_reader_panic(text in any::<String>()) {
        let _ = read(&text, Path::new("demo.yaml"), &[], &Library::built_in());
    }

    #[test]
    fn no_bytes_make_the_reader_panic(bytes in prop::collection::vec(any::<u8>(), 0..200)) {
        let _ = read_bytes(&bytes, Path::new("demo.yaml"), &[], &Library::built_in());
    }

    #[test]
    fn no_slip_of_the_pen_makes_the_reader_panic(text in mutated()) {
        if let Err(found) = read(&text, Path::new("demo.yaml"), &[], &Library::built_in()) {
            prop_assert!(!found.is_empty());
            for fault in found {
                prop_assert!(!fault.message.is_empty() && fault.width >= 1);
                if let (Some(place), Some(line)) = (fault.place, &fault.line_text) {
                    prop_assert!(place.column <= line.chars().count() + 1, "{fault} in {line:?}");
                }
            }
        }
    }
}

#[test]
fn utf_16_and_merge_keys_are_called_by_their_name() {
    let library = Library::built_in();
    let told = |bytes: &[u8]| {
        let found = read_bytes(bytes, Path::new("demo.yaml"), &[], &library).unwrap_err();
        assert_eq!(found.len(), 1, "{}", listed(&found));
        (found[0].message.clone(), found[0].help.clone().unwrap_or_default())
    };
    let units: Vec<u16> = LEAST.encode_utf16().collect();
    let little: Vec<u8> = units.iter().flat_map(|unit| unit.to_le_bytes()).collect();
    let big: Vec<u8> = units.iter().flat_map(|unit| unit.to_be_bytes()).collect();
    let marked = |mark: [u8; 2], text: &[u8]| [mark.as_slice(), text].concat();
    for bytes in [little.clone(), big.clone(), marked([0xff, 0xfe], &little), marked([0xfe, 0xff], &big)] {
        let (message, help) = told(&bytes);
        assert_eq!(message, "the file looks like UTF-16, and a joint file is in UTF-8");
        assert!(help.contains("save it as UTF-8"), "{help}");
    }
    assert!(told(b"PK\0\0\0\0").0.contains("NUL bytes"));
    let merged = LEAST.replacen("shaft: {", "shaft: {<<: {bore: 20 mm}, ", 1);
    let found = faults(&merged);
    assert_eq!(found.len(), 1, "{}", listed(&found));
    assert_eq!(found[0].message, "merge keys (`<<`) are not read");
    assert_eq!(place(&found[0]), Some((4, 9, 2)));
    assert!(found[0].help.as_ref().is_some_and(|help| help.contains("write the keys out")));
}
