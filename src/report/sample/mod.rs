//! Joints with all their findings, made up for the tests of the report.
//!
//! Sizes, loads and requirements are invented; the limits are those of the tolerance classes they name
//! (ISO 286-2:2010). Elastic results follow from Lamé's formulas for rings under pressure.

mod compute;
mod parts;
mod worksheet;

pub(crate) use compute::findings;
pub(crate) use parts::{Part, Spec, aluminium, c45, grey_iron, quenched};

use crate::findings::Findings;
use crate::joint::Method;
use crate::quantity::UnitSystem;

/// Solid shaft of 60 mm in a grey iron hub, pressed.
pub(crate) fn fan_hub() -> Findings {
    findings(&Spec {
        title: "Fan hub on a motor shaft",
        parts: vec![Part::solid("shaft", c45(), 60.0, 6.3), Part::new("hub", grey_iron(), 110.0, 10.0)],
        fits: vec![("H7/s6", [0.0, 30.0, 53.0, 72.0])],
        length: 70.0,
        relief: 3.0,
        torque: 300.0,
        axial_force: 2000.0,
        ..Spec::default()
    })
}

/// Hollow shaft in a steel hub, the hub heated.
pub(crate) fn hollow_shaft() -> Findings {
    findings(&Spec {
        title: "Gear rim on a hollow shaft",
        parts: vec![
            Part { inner: Some(40.0), ..Part::new("shaft", quenched(), 80.0, 4.0) },
            Part::new("gear", quenched(), 140.0, 6.3),
        ],
        fits: vec![("H7/u6", [0.0, 30.0, 102.0, 121.0])],
        length: 60.0,
        torque: 4000.0,
        method: Method::HeatHub,
        ..Spec::default()
    })
}

/// A tyre of two metres on a wheel centre.
pub(crate) fn big_rim() -> Findings {
    findings(&Spec {
        title: "Tyre on a runner wheel",
        parts: vec![
            Part { inner: Some(300.0), ..Part::new("wheel centre", c45(), 1800.0, 10.0) },
            Part::new("tyre", quenched(), 2000.0, 10.0),
        ],
        fits: vec![("H8/{1.65 … 1.80}", [0.0, 230.0, 1650.0, 1800.0])],
        length: 130.0,
        torque: 250e3,
        method: Method::HeatHub,
        ..Spec::default()
    })
}

/// A bush with a wall of 3 mm, chilled into a housing.
pub(crate) fn thin_bush() -> Findings {
    findings(&Spec {
        title: "Bush in a housing",
        parts: vec![
            Part { inner: Some(50.0), ..Part::new("bush", c45(), 56.0, 4.0) },
            Part::new("housing", aluminium(), 110.0, 6.3),
        ],
        fits: vec![("H7/r6", [0.0, 30.0, 41.0, 60.0])],
        length: 60.0,
        torque: 0.0,
        axial_force: 500.0,
        method: Method::ChillShaft,
        ..Spec::default()
    })
}

/// A transition fit: the loosest pair has clearance.
pub(crate) fn transition() -> Findings {
    findings(&Spec {
        title: "Located coupling half",
        parts: vec![Part::solid("shaft", c45(), 60.0, 6.3), Part::new("hub", c45(), 100.0, 6.3)],
        fits: vec![("H7/n6", [0.0, 30.0, 20.0, 39.0])],
        length: 50.0,
        torque: 50.0,
        ..Spec::default()
    })
}

/// So much interference that the tightest hub yields.
pub(crate) fn yielding() -> Findings {
    findings(&Spec {
        title: "Crank web on a pin",
        parts: vec![Part::solid("pin", quenched(), 60.0, 4.0), Part::new("web", c45(), 120.0, 6.3)],
        fits: vec![("H7/x7", [0.0, 30.0, 122.0, 152.0])],
        length: 60.0,
        torque: 6000.0,
        method: Method::HeatAndChill,
        ..Spec::default()
    })
}

/// Three rings: a shaft, a sleeve and a hub.
pub(crate) fn three_rings() -> Findings {
    findings(&Spec {
        title: "Die ring with a liner",
        parts: vec![
            Part { inner: Some(20.0), ..Part::new("insert", quenched(), 40.0, 2.5) },
            Part::new("liner", quenched(), 60.0, 4.0),
            Part::new("case", c45(), 100.0, 6.3),
        ],
        fits: vec![("H6/s6", [0.0, 16.0, 43.0, 59.0]), ("H6/s6", [0.0, 19.0, 53.0, 72.0])],
        length: 45.0,
        torque: 200.0,
        method: Method::HeatHub,
        ..Spec::default()
    })
}

/// A pin of 3 mm in a plate, in inches.
pub(crate) fn small_pin() -> Findings {
    findings(&Spec {
        title: "Dowel pin in a lever",
        parts: vec![Part::solid("pin", quenched(), 3.0, 1.6), Part::new("lever", c45(), 20.0, 6.3)],
        fits: vec![("H7/s6", [0.0, 10.0, 14.0, 20.0])],
        length: 8.0,
        torque: 0.5,
        display: UnitSystem::Inch,
        ..Spec::default()
    })
}

/// A long slender tube on a bar.
pub(crate) fn long_tube() -> Findings {
    findings(&Spec {
        title: "Roll tube on a core",
        parts: vec![Part::solid("core", c45(), 40.0, 6.3), Part::new("tube", c45(), 52.0, 6.3)],
        fits: vec![("H7/p6", [0.0, 25.0, 26.0, 42.0])],
        length: 1600.0,
        torque: 100.0,
        method: Method::HeatHub,
        ..Spec::default()
    })
}

/// Every sample with a file name.
pub(crate) fn all() -> Vec<(&'static str, Findings)> {
    let mut inch = hollow_shaft();
    inch.joint.display = UnitSystem::Inch;
    vec![
        ("fan_hub", fan_hub()),
        ("hollow_shaft", hollow_shaft()),
        ("hollow_shaft_inch", inch),
        ("big_rim", big_rim()),
        ("thin_bush", thin_bush()),
        ("transition", transition()),
        ("yielding", yielding()),
        ("three_rings", three_rings()),
        ("small_pin", small_pin()),
        ("long_tube", long_tube()),
    ]
}
