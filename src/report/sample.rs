//! Joints with all their findings for the tests of the report.
//!
//! Sizes, loads and requirements are invented; limits, materials and results are those of the program.

use std::path::Path;
use std::sync::{Arc, OnceLock};

use crate::findings::{Findings, compute};
use crate::joint::read::read;
use crate::material::library::Library;

/// The findings of a joint file without its first line.
fn findings(file: &str) -> Findings {
    static LIBRARY: OnceLock<Library> = OnceLock::new();
    let library = LIBRARY.get_or_init(Library::built_in);
    let text = format!("joint_file: 1\n{file}");
    let joint = read(&text, Path::new("sample.yaml"), &[], library)
        .unwrap_or_else(|wrong| panic!("{}", wrong.iter().map(|one| format!("{one}\n")).collect::<String>()));
    compute(joint).unwrap()
}

/// Solid shaft of 60 mm in a grey iron hub, pressed.
pub(crate) fn fan_hub() -> Findings {
    findings(
        "title: Fan hub on a motor shaft
drawing: FH-204 rev C
date: 2026-03-02
diameter: 60 mm
length: 70 mm
relief: 3 mm
shaft: {material: C45+N, roughness: Rz 6.3 um}
hub: {material: EN-GJL-250, outer_diameter: 110 mm, roughness: Rz 10 um}
fit: H7/s6
friction: {holding: 0.12, pressing: 0.08 to 0.14}
duty:
  - {state: rated, torque: 150 N.m, axial_force: 2 kN}
  - {state: 'starting, warm', torque: 195 N.m, axial_force: 2 kN, temperature: 60 degC}
require: {fracture_safety: 1.6, press_force: 150 kN}
",
    )
}

const HOLLOW_SHAFT: &str = "title: Gear rim on a hollow shaft
diameter: 80 mm
length: 60 mm
shaft: {material: 42CrMo4+QT, bore: 40 mm, roughness: Rz 4 um}
hub: {name: gear, material: 42CrMo4+QT, outer_diameter: 140 mm, roughness: Rz 6.3 um}
fit: H7/u6
duty: [{state: rated, torque: 1400 N.m, speed: 3000 rpm, temperature: 70 degC}]
assembly: {method: heat hub}
";

/// Hollow shaft in a steel hub, the hub heated.
pub(crate) fn hollow_shaft() -> Findings {
    findings(HOLLOW_SHAFT)
}

/// The same joint told in inches.
pub(crate) fn hollow_shaft_inch() -> Findings {
    findings(&format!("{HOLLOW_SHAFT}display: inch\n"))
}

/// A tyre of two metres on a wheel centre.
pub(crate) fn big_rim() -> Findings {
    findings(
        "title: Tyre on a runner wheel
diameter: 1800 mm
length: 130 mm
shaft: {name: wheel centre, material: GE300+N, bore: 300 mm, roughness: Rz 10 um, section: 75 mm}
hub: {name: tyre, material: 42CrMo4+QT, outer_diameter: 2000 mm, roughness: Rz 10 um, section: 100 mm}
fit: {hole: {lower: 0 um, upper: 230 um}, shaft: {lower: 1650 um, upper: 1800 um}}
duty: [{state: running, torque: 250 kN.m, speed: 120 rpm}]
assembly: {method: heat hub}
",
    )
}

/// A bush with a wall of 3 mm, chilled into a housing.
pub(crate) fn thin_bush() -> Findings {
    findings(
        "title: Bush in a housing
diameter: 56 mm
length: 60 mm
shaft: {name: bush, material: CuSn8-R450, bore: 50 mm, roughness: Rz 4 um, section: 3 mm}
hub: {name: housing, material: EN-AW-6082-T6, outer_diameter: 110 mm, roughness: Rz 6.3 um}
fit: H7/r6
duty: [{state: rated, axial_force: 500 N}]
assembly: {method: chill shaft, bath: liquid nitrogen}
",
    )
}

/// A transition fit: the loosest pair has clearance.
pub(crate) fn transition() -> Findings {
    findings(
        "title: Located coupling half
diameter: 60 mm
length: 50 mm
shaft: {material: C45+N, roughness: Rz 6.3 um}
hub: {material: C45+N, outer_diameter: 100 mm, roughness: Rz 6.3 um}
fit: H7/n6
duty: [{state: rated, torque: 50 N.m}]
",
    )
}

/// So much interference that the tightest hub yields.
pub(crate) fn yielding() -> Findings {
    findings(
        "title: Crank web on a pin
diameter: 60 mm
length: 60 mm
shaft: {name: pin, material: 42CrMo4+QT, roughness: Rz 4 um}
hub: {name: web, material: C45+N, outer_diameter: 120 mm, roughness: Rz 6.3 um}
fit: H7/x7
duty: [{state: rated, torque: 2000 N.m}]
assembly: {method: heat and chill, bath: liquid nitrogen}
",
    )
}

/// A hub that may yield by design.
pub(crate) fn plastic_hub() -> Findings {
    findings(
        "title: Cam lobe on a tube
diameter: 40 mm
length: 18 mm
shaft: {name: tube, material: 42CrMo4+QT, bore: 18 mm, roughness: Rz 4 um}
hub: {name: lobe, material: C45+N, outer_diameter: 68 mm, roughness: Rz 6.3 um}
fit: {hole: H6, shaft: {lower: 105 um, upper: 115 um}}
friction: {lubrication: degreased}
duty: [{state: running, torque: 250 N.m, temperature: 90 degC}]
assembly: {method: heat and chill, bath: liquid nitrogen}
require: {allow: plastic, yield_rule: Tresca, plastic_share: 0.3}
",
    )
}

/// Three rings: an insert, a liner and a case, the outer two joined first.
pub(crate) fn three_rings() -> Findings {
    findings(
        "title: Die ring with a liner
length: 45 mm
rings:
  - {name: insert, material: 42CrMo4+QT, bore: 20 mm, outer_diameter: 40 mm, roughness: Rz 2.5 um}
  - {name: liner, material: 42CrMo4+QT, outer_diameter: 60 mm, roughness: Rz 4 um}
  - {name: case, material: C45+N, outer_diameter: 100 mm, roughness: Rz 6.3 um}
fits: [H6/s6, H6/s6]
order: [2, 1]
duty: [{state: stroke, inner_pressure: 150 MPa}]
assembly: {method: heat hub}
",
    )
}

/// Hub and shaft stepped, at speed, with bending.
pub(crate) fn stepped() -> Findings {
    findings(
        "title: Coupling hub of a blower
diameter: 80 mm
length: 90 mm
relief: 4 mm
shaft: {material: 42CrMo4+QT, roughness: Rz 4 um, steps: [{length: 50 mm, bore: 0 mm}, {length: 40 mm, bore: 25 mm}]}
hub:
  material: 42CrMo4+QT
  roughness: Rz 6.3 um
  steps: [{length: 55 mm, outer_diameter: 125 mm}, {length: 35 mm, outer_diameter: 180 mm}]
fit: H7/u6
duty:
  - {state: rated, torque: 1.5 kN.m, speed: 6000 rpm, temperature: 60 degC, bending_moment: 200 N.m, rotating_bending: yes}
  - {state: warming up, torque: 1.5 kN.m, shaft_temperature: 25 degC, hub_temperature: 65 degC, reversing: yes}
assembly: {method: heat hub}
",
    )
}

/// A pin of 3 mm in a lever, in inches.
pub(crate) fn small_pin() -> Findings {
    findings(
        "title: Dowel pin in a lever
diameter: 3 mm
length: 8 mm
shaft: {name: pin, material: 100Cr6, roughness: Rz 1.6 um}
hub: {name: lever, material: C45+N, outer_diameter: 20 mm, roughness: Rz 6.3 um}
fit: H7/s6
duty: [{state: rated, torque: 0.05 N.m}]
display: inch
",
    )
}

/// A long slender tube on a bar.
pub(crate) fn long_tube() -> Findings {
    findings(
        "title: Roll tube on a core
diameter: 40 mm
length: 1600 mm
shaft: {name: core, material: C45+N, roughness: Rz 6.3 um}
hub: {name: tube, material: S355J2, outer_diameter: 52 mm, roughness: Rz 6.3 um}
fit: H7/p6
duty: [{state: rated, torque: 10 N.m}]
assembly: {method: heat hub}
",
    )
}

/// A clearance fit: no pair grips, no load, no title.
pub(crate) fn clearance() -> Findings {
    findings(
        "diameter: 60 mm
length: 50 mm
shaft: {material: C45+N, roughness: Rz 6.3 um}
hub: {material: PA66, outer_diameter: 100 mm, roughness: Rz 6.3 um}
fit: H7/g6
",
    )
}

/// A joint whose every free text tries to break out of the page.
pub(crate) fn hostile() -> Findings {
    let mut findings = fan_hub();
    let hostile = "</title></svg><script>alert(\"1\")</script> & 'x' \u{0}\u{7}";
    let joint = &mut findings.joint;
    joint.title = hostile.into();
    joint.drawing = Some(hostile.into());
    joint.note = Some(hostile.into());
    joint.date = Some(hostile.into());
    joint.set = vec![(hostile.into(), hostile.into())];
    for ring in &mut joint.rings {
        ring.name = hostile.into();
        let material = Arc::make_mut(&mut ring.material);
        material.name = hostile.into();
        material.notes = Some(hostile.into());
    }
    for fit in &mut joint.fits {
        fit.callout = hostile.into();
    }
    for state in &mut joint.duty {
        state.name = hostile.into();
    }
    findings.notes.push(hostile.into());
    findings
}

/// Every sample with a name.
pub(crate) fn all() -> Vec<(&'static str, Findings)> {
    vec![
        ("fan_hub", fan_hub()),
        ("hollow_shaft", hollow_shaft()),
        ("hollow_shaft_inch", hollow_shaft_inch()),
        ("big_rim", big_rim()),
        ("thin_bush", thin_bush()),
        ("transition", transition()),
        ("yielding", yielding()),
        ("plastic_hub", plastic_hub()),
        ("three_rings", three_rings()),
        ("stepped", stepped()),
        ("small_pin", small_pin()),
        ("long_tube", long_tube()),
        ("clearance", clearance()),
        ("hostile", hostile()),
    ]
}
