//! Changes from the command line: the same as an edit, and told by their option.

mod joint_support;

use hubgrip::joint::Joint;
use joint_support::{FULL, LEAST, joint, listed, place, set};
use proptest::prelude::*;

#[test]
fn a_change_is_the_same_as_an_edit() {
    for (change, from, to) in [
        (("fit", "H7/s6"), "fit: H7/u6", "fit: H7/s6"),
        (("hub.outer_diameter", "120mm"), "outer_diameter: 110 mm", "outer_diameter: 120mm"),
        (("hub.material", "1.0060"), "material: C45+QT", "material: 1.0060"),
        (("fit", "{hole: H8, shaft: u7}"), "fit: H7/u6", "fit: {hole: H8, shaft: u7}"),
        (("require.slip_safety", "2"), "fit: H7/u6", "fit: H7/u6\nrequire: {slip_safety: 2}"),
        (("duty.rated.torque", "1 kN.m"), "fit: H7/u6", "fit: H7/u6\nduty: [{state: rated, torque: 1 kN.m}]"),
        (("drawing", "12.50"), "fit: H7/u6", "fit: H7/u6\ndrawing: 12.50"),
    ] {
        let edited = joint(&LEAST.replacen(from, to, 1));
        let changed = set(LEAST, &[change]).unwrap_or_else(|found| panic!("{}", listed(&found)));
        assert_eq!(changed.set, [(change.0.to_owned(), change.1.to_owned())]);
        assert_ne!(changed.digest, edited.digest);
        assert_eq!(
            Joint { set: Vec::new(), digest: String::new(), ..changed },
            Joint { digest: String::new(), ..edited }
        );
    }
}

#[test]
fn faults_in_a_change_name_the_option_not_a_line() {
    let told = |changes: &[(&str, &str)]| {
        let found = set(LEAST, changes).unwrap_err();
        assert_eq!(found.len(), 1, "{}", listed(&found));
        assert_eq!((place(&found[0]), found[0].file.as_deref()), (None, None));
        (found[0].message.clone(), found[0].help.clone().unwrap_or_default())
    };
    assert_eq!(
        told(&[("hub.outer_diameter", "50mm")]).0,
        "--set hub.outer_diameter: outer_diameter 50mm is not larger than the mating diameter 60 mm"
    );
    assert_eq!(
        told(&[("hub.outer_diametr", "50mm")]),
        (
            "--set hub.outer_diametr: unknown key `outer_diametr` in `hub`".to_owned(),
            "did you mean `outer_diameter`?".to_owned()
        )
    );
    assert_eq!(
        told(&[("hubb.outer_diameter", "50mm")]),
        ("--set hubb.outer_diameter: unknown key `hubb`".to_owned(), "did you mean `hub`?".to_owned())
    );
    assert_eq!(told(&[("length", "70")]).0, "--set length: 70 has no unit: write 70 mm");
    assert_eq!(
        told(&[("bearing", "6210")]),
        (
            "--set bearing: unknown key `bearing`".to_owned(),
            "`bearing` is a key of `shaft` and `hub`: indent it below its section".to_owned()
        )
    );
    // A fault in the file itself still has its line.
    let found = set(&LEAST.replacen("70 mm", "70", 1), &[("hub.outer_diameter", "50mm")]).unwrap_err();
    assert_eq!(place(&found[0]), Some((3, 9, 2)));
    assert!(found[1].message.starts_with("--set hub.outer_diameter"));
}

#[test]
fn the_digest_is_that_of_the_file_and_follows_the_changes() {
    // Witness: the text of LEAST in a file, then `sha256sum FILE`.
    let plain = joint(LEAST);
    assert_eq!(plain.digest, "d7f0653d01b28f6b261a75ab380a58c4a16e28c5b79b789da7c66b24611593c2");
    let changed = set(LEAST, &[("length", "71 mm")]).unwrap();
    assert_ne!(plain.digest, changed.digest);
    assert_eq!(changed.digest, set(LEAST, &[("length", "71 mm")]).unwrap().digest);
    assert_ne!(changed.digest, set(LEAST, &[("length", "72 mm")]).unwrap().digest);
    assert_ne!(plain.digest, joint(&format!("{LEAST}# a remark\n")).digest);
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 150, ..ProptestConfig::default() })]

    #[test]
    fn no_change_makes_the_reader_panic(key in "[a-z_.0-9]{0,12}", value in "[ -~]{0,12}") {
        let _ = set(FULL, &[(&key, &value)]);
    }

    #[test]
    fn any_length_is_read_alike_from_file_and_change(micrometres in 1_000_u32..1_000_000) {
        let text = format!("{}.{:03} mm", micrometres / 1000, micrometres % 1000);
        let edited = joint(&LEAST.replacen("length: 70 mm", &format!("length: {text}"), 1));
        let changed = set(LEAST, &[("length", &text)]).unwrap();
        prop_assert_eq!(edited.length, changed.length);
    }
}
