//! What the tests of the joint file share: two files, and faults as they are told.
#![allow(dead_code)]

use std::path::Path;

use hubgrip::diagnostic::Diagnostic;
use hubgrip::joint::Joint;
use hubgrip::joint::read::read;
use hubgrip::material::library::Library;

/// A file with every key. Invented demo data.
pub const FULL: &str = "\
joint_file: 1
title: Demo hub
drawing: D-12.50 rev 007
note: two lines are not needed
date: 2026-01-31
diameter: 60 mm
length: 70 mm
relief: 3 mm
shaft: {name: pin, material: C45+N, bore: 20 mm, roughness: Rz 6.3 um, section: 20 mm}
hub:
  name: web
  material: EN-GJL-250
  outer_diameter: 110 mm
  roughness: Ra 1.6 um
  section: 25 mm
fit: H7/s6
friction: {holding: 0.12, pressing: 0.08 to 0.14, release: 0.1 to 0.2, lubrication: oiled}
duty:
  - {state: rated, torque: 900 N.m, axial_force: 2 kN, shaft_temperature: 60 degC, hub_temperature: 45 degC}
  - state: idle
    temperature: 313.15 K
assembly:
  method: heat and chill
  shop_temperature: 25 degC
  clearance: 50 um
  chamfer_angle: 10 deg
  bath: liquid nitrogen
  hub_temperature_limit: 200 degC
smoothing: {factor: 0.4, at: both}
criterion: Tresca
require: {slip_safety: 1.4, yield_safety: 1.1, fracture_safety: 2.2, press_force: 300 kN, allow: elastic}
display: inch
";

/// The least file that is read. Invented demo data.
pub const LEAST: &str = "\
joint_file: 1
diameter: 60 mm
length: 70 mm
shaft: {material: C45+N}
hub: {material: C45+QT, outer_diameter: 110 mm}
fit: H7/u6
";

/// The joint of a text without faults.
pub fn joint(text: &str) -> Joint {
    match read(text, Path::new("demo.yaml"), &[], &Library::built_in()) {
        Ok(joint) => joint,
        Err(faults) => panic!("{}", listed(&faults)),
    }
}

/// The faults of a text.
pub fn faults(text: &str) -> Vec<Diagnostic> {
    read(text, Path::new("demo.yaml"), &[], &Library::built_in()).expect_err("the text is read")
}

/// The joint of a text with changes.
pub fn set(text: &str, changes: &[(&str, &str)]) -> Result<Joint, Vec<Diagnostic>> {
    let changes: Vec<(String, String)> =
        changes.iter().map(|(key, value)| ((*key).to_owned(), (*value).to_owned())).collect();
    read(text, Path::new("demo.yaml"), &changes, &Library::built_in())
}

/// Faults as lines.
pub fn listed(faults: &[Diagnostic]) -> String {
    faults.iter().map(|fault| format!("{fault} [{}]\n", fault.help.as_deref().unwrap_or("-"))).collect()
}

/// Line, column and width.
pub fn place(fault: &Diagnostic) -> Option<(usize, usize, usize)> {
    fault.place.map(|place| (place.line, place.column, fault.width))
}

/// One fault: the change that makes it, its place, its message, a part of its help.
pub struct Case {
    pub change: (&'static str, &'static str),
    pub place: Option<(usize, usize, usize)>,
    pub message: &'static str,
    pub help: &'static str,
}

/// Makes each change in the text, and looks for its one fault.
pub fn check(text: &str, cases: &[Case]) {
    for case in cases {
        let (from, to) = case.change;
        assert!(text.contains(from), "the text has no `{from}`");
        let found = faults(&text.replacen(from, to, 1));
        assert_eq!(found.len(), 1, "`{to}`:\n{}", listed(&found));
        let fault = &found[0];
        assert_eq!(fault.message, case.message, "`{to}`");
        assert_eq!(place(fault), case.place, "`{to}`: {}", listed(&found));
        let help = fault.help.as_deref().unwrap_or("");
        assert!(help.contains(case.help), "`{to}`: help is `{help}`");
        assert_eq!(case.help.is_empty(), help.is_empty(), "`{to}`: help is `{help}`");
        assert_eq!(fault.file.as_deref(), Some(Path::new("demo.yaml")), "`{to}`");
    }
}

/// A fault with a place.
pub fn case(
    change: (&'static str, &'static str),
    place: (usize, usize, usize),
    message: &'static str,
    help: &'static str,
) -> Case {
    Case { change, place: Some(place), message, help }
}

/// A line taken out: a fault without a place.
pub fn missing(change: &'static str, message: &'static str, help: &'static str) -> Case {
    Case { change: (change, ""), place: None, message, help }
}
