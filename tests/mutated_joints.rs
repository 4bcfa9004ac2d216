//! The examples with numbers and materials changed at random: each is refused with a place, or computed and reported whole.

mod common;
mod random_joints;

use std::path::Path;

use hubgrip::findings::compute;
use hubgrip::joint::read;
use hubgrip::material::library::Library;
use hubgrip::report::{html, json};
use rand::{Rng, RngExt};

const FACTORS: [f64; 14] = [0.0, 0.1, 0.5, 0.9, 0.99, 1.01, 1.1, 2.0, 10.0, 1e3, 1e-3, 1e6, -1.0, 1e-9];
const MATERIALS: [&str; 12] = [
    "C45+N",
    "42CrMo4+QT",
    "EN-GJL-250",
    "EN-AW-6082-T6",
    "PA66",
    "POM-C",
    "Ti-6Al-4V",
    "X5CrNi18-10",
    "CuSn12-C-GC",
    "Fe-36Ni",
    "WC-10Co",
    "100Cr6",
];

/// Places of the plain numbers of a joint file, comments left out.
fn numbers(text: &str) -> Vec<(usize, usize)> {
    let bytes = text.as_bytes();
    let mut found = Vec::new();
    let (mut place, mut comment) = (0, false);
    while place < bytes.len() {
        comment = bytes[place] == b'#' || comment && bytes[place] != b'\n';
        let begins = bytes[place].is_ascii_digit()
            && !place.checked_sub(1).is_some_and(|before| {
                bytes[before].is_ascii_alphanumeric() || b".+".contains(&bytes[before])
            });
        let start = place;
        while begins && place < bytes.len() && (bytes[place].is_ascii_digit() || bytes[place] == b'.') {
            place += 1;
        }
        if begins && !comment {
            found.push((start, place));
        }
        place = place.max(start + 1);
    }
    found
}

fn mutated(text: &str, random: &mut impl Rng) -> String {
    let mut text = text.to_owned();
    for _ in 0..random.random_range(1..4) {
        let found = numbers(&text);
        let (start, end) = found[random.random_range(0..found.len())];
        let Ok(value) = text[start..end].parse::<f64>() else { continue };
        let changed = format!("{:.6}", value * FACTORS[random.random_range(0..FACTORS.len())]);
        text.replace_range(start..end, changed.trim_end_matches('0').trim_end_matches('.'));
    }
    if random.random_bool(0.3)
        && let Some(known) = MATERIALS.iter().find(|name| text.contains(**name))
    {
        text = text.replacen(known, MATERIALS[random.random_range(0..MATERIALS.len())], 1);
    }
    text
}

#[test]
fn a_changed_example_is_refused_at_its_place_or_computed_whole() {
    let library = Library::built_in();
    let examples: Vec<String> =
        common::examples().iter().map(|path| std::fs::read_to_string(path).unwrap()).collect();
    let mut random = random_joints::stream(17);
    let (mut refused, mut computed) = (0, 0);
    for _ in 0..240 {
        let text = mutated(&examples[random.random_range(0..examples.len())], &mut random);
        match read::read(&text, Path::new("changed.yaml"), &[], &library) {
            Err(faults) => {
                refused += 1;
                assert!(faults.iter().all(|fault| !fault.message.is_empty()), "{text}");
                assert!(faults.iter().any(|fault| fault.place.is_some()), "{text}\n{faults:#?}");
            }
            Ok(joint) => {
                computed += 1;
                let findings = compute(joint).unwrap_or_else(|error| panic!("{error}\n{text}"));
                let finite = |value: Option<f64>| value.is_none_or(f64::is_finite);
                for verdict in &findings.verdicts {
                    assert!(finite(verdict.found) && finite(verdict.required), "{verdict:?}\n{text}");
                }
                let page = html::html(&findings);
                assert!(!page.contains("NaN") && !page.contains(">inf"), "{text}");
                assert!(!json::to_json(&findings).contains("NaN"), "{text}");
            }
        }
    }
    assert!(refused > 60 && computed > 60, "{refused} refused, {computed} computed");
}
