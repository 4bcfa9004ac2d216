//! Joints with all their findings for the tests of the report.
//!
//! Sizes, loads and requirements are invented; the limits are those of the tolerance classes they name
//! (ISO 286-2:2010), the materials those of the library, the results computed.

use std::sync::{Arc, OnceLock};

use crate::findings::{FaceStress, Findings, RingStress, compute};
use crate::joint::*;
use crate::material::library::Library;
use crate::material::{Kind, Range, Sourced};
use crate::mechanics::criteria::{self, DuctileCriterion};
use crate::mechanics::plastic::YieldRule;
use crate::mechanics::ring::RingSection;
use crate::mechanics::stack::Stack;
use crate::quantity::UnitSystem;
use crate::tolerance::{Extremes, FitLimits, Limits};

/// One ring: name, material, outer diameter in mm, roughness Rz in µm.
type Part = (&'static str, &'static str, f64, f64);

/// A joint in short: mm, µm, N, N·m.
struct Spec {
    title: &'static str,
    bore: f64,
    parts: Vec<Part>,
    /// Callout with hole lower, hole upper, shaft lower, shaft upper.
    fits: Vec<(&'static str, [f64; 4])>,
    length: f64,
    relief: f64,
    torque: f64,
    axial_force: f64,
    method: Method,
    display: UnitSystem,
}

impl Default for Spec {
    fn default() -> Self {
        Self {
            title: "",
            bore: 0.0,
            parts: Vec::new(),
            fits: Vec::new(),
            length: 50.0,
            relief: 0.0,
            torque: 0.0,
            axial_force: 0.0,
            method: Method::Press,
            display: UnitSystem::Metric,
        }
    }
}

/// Solid shaft of 60 mm in a grey iron hub, pressed.
pub(crate) fn fan_hub() -> Findings {
    findings(&Spec {
        title: "Fan hub on a motor shaft",
        parts: vec![("shaft", "C45+N", 60.0, 6.3), ("hub", "EN-GJL-250", 110.0, 10.0)],
        fits: vec![("H7/s6", [0.0, 30.0, 53.0, 72.0])],
        length: 70.0,
        relief: 3.0,
        torque: 150.0,
        axial_force: 2000.0,
        ..Spec::default()
    })
}

/// Hollow shaft in a steel hub, the hub heated.
pub(crate) fn hollow_shaft() -> Findings {
    findings(&Spec {
        title: "Gear rim on a hollow shaft",
        bore: 40.0,
        parts: vec![("shaft", "42CrMo4+QT", 80.0, 4.0), ("gear", "42CrMo4+QT", 140.0, 6.3)],
        fits: vec![("H7/u6", [0.0, 30.0, 102.0, 121.0])],
        length: 60.0,
        torque: 1400.0,
        method: Method::HeatHub,
        ..Spec::default()
    })
}

/// A tyre of two metres on a wheel centre.
pub(crate) fn big_rim() -> Findings {
    findings(&Spec {
        title: "Tyre on a runner wheel",
        bore: 300.0,
        parts: vec![("wheel centre", "GE300+N", 1800.0, 10.0), ("tyre", "42CrMo4+QT", 2000.0, 10.0)],
        fits: vec![("H8/+1800 µm +1650 µm", [0.0, 230.0, 1650.0, 1800.0])],
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
        bore: 50.0,
        parts: vec![("bush", "CuSn8-R450", 56.0, 4.0), ("housing", "EN-AW-6082-T6", 110.0, 6.3)],
        fits: vec![("H7/r6", [0.0, 30.0, 41.0, 60.0])],
        length: 60.0,
        axial_force: 500.0,
        method: Method::ChillShaft,
        ..Spec::default()
    })
}

/// A transition fit: the loosest pair has clearance.
pub(crate) fn transition() -> Findings {
    findings(&Spec {
        title: "Located coupling half",
        parts: vec![("shaft", "C45+N", 60.0, 6.3), ("hub", "C45+N", 100.0, 6.3)],
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
        parts: vec![("pin", "42CrMo4+QT", 60.0, 4.0), ("web", "C45+N", 120.0, 6.3)],
        fits: vec![("H7/x7", [0.0, 30.0, 122.0, 152.0])],
        length: 60.0,
        torque: 2000.0,
        method: Method::HeatAndChill,
        ..Spec::default()
    })
}

/// Three rings: an insert, a liner and a case, shrunk together.
///
/// The case is put round the computed pair here: its stresses, and theirs with it, come from the stack of rings.
pub(crate) fn three_rings() -> Findings {
    let spec = |parts: &[Part], fits: &[(&'static str, [f64; 4])]| Spec {
        title: "Die ring with a liner",
        bore: 20.0,
        parts: parts.to_vec(),
        fits: fits.to_vec(),
        length: 45.0,
        torque: 200.0,
        method: Method::HeatHub,
        ..Spec::default()
    };
    let parts =
        [("insert", "100Cr6", 40.0, 2.5), ("liner", "42CrMo4+QT", 60.0, 4.0), ("case", "C45+N", 100.0, 6.3)];
    let fits = [("H6/s6", [0.0, 16.0, 43.0, 59.0]), ("H6/s6", [0.0, 19.0, 53.0, 72.0])];
    let mut findings = findings(&spec(&parts[..2], &fits[..1]));
    findings.joint = joint(&spec(&parts, &fits));
    let joint = &findings.joint;
    let of = |pick: fn(&Extremes<f64>) -> f64| -> Vec<f64> {
        joint.fits.iter().map(|fit| pick(&fit.limits.interference())).collect()
    };
    findings.extremes.loosest.rings = stresses(joint, of(|e| e.loosest));
    findings.extremes.mean.rings = stresses(joint, of(|e| e.mean));
    findings.extremes.tightest.rings = stresses(joint, of(|e| e.tightest));
    findings
}

fn stresses(joint: &Joint, interference: Vec<f64>) -> Vec<RingStress> {
    let section = |ring: &Ring| {
        let material = &ring.material;
        let (inner, outer) = (ring.inner_diameter / 2.0, ring.outer_diameter / 2.0);
        let (e, nu) = (material.youngs_modulus.value, material.poisson.value);
        RingSection::new(inner, outer, e, nu, material.density.value).unwrap()
    };
    let stack = Stack {
        rings: joint.rings.iter().map(section).collect(),
        free_strain: vec![0.0; joint.rings.len()],
        interference,
        ..Stack::default()
    };
    let solution = stack.solve().unwrap();
    let of_ring = |(index, ring): (usize, &Ring)| {
        let load = stack.ring_load(index, &solution).unwrap();
        let section = &stack.rings[index];
        let face = |radius: f64| {
            let stress = section.stress_at(&load, radius).unwrap();
            let (radial, hoop) = (stress.radial, stress.hoop);
            let (von_mises, tresca) = (criteria::von_mises(radial, hoop), criteria::tresca(radial, hoop));
            FaceStress { radial, hoop, von_mises, tresca }
        };
        let (bore, rim) = (face(section.inner_radius()), face(section.outer_radius()));
        let tension = |face: &FaceStress| criteria::greatest_principal(face.radial, face.hoop);
        let (equivalent, strength) = match ring.material.kind {
            Kind::Brittle => (tension(&bore).max(tension(&rim)), ring.strength.tensile_strength),
            _ => (bore.von_mises.max(rim.von_mises), ring.strength.yield_strength),
        };
        let change = |radius: f64| 2.0 * section.displacement_at(&load, radius).unwrap();
        RingStress {
            bore,
            rim,
            equivalent,
            strength,
            safety: strength.filter(|_| equivalent > 0.0).map(|strength| strength / equivalent),
            bore_change: change(section.inner_radius()),
            outer_change: change(section.outer_radius()),
        }
    };
    joint.rings.iter().enumerate().map(of_ring).collect()
}

/// A pin of 3 mm in a lever, in inches.
pub(crate) fn small_pin() -> Findings {
    findings(&Spec {
        title: "Dowel pin in a lever",
        parts: vec![("pin", "100Cr6", 3.0, 1.6), ("lever", "C45+N", 20.0, 6.3)],
        fits: vec![("H7/s6", [0.0, 10.0, 14.0, 20.0])],
        length: 8.0,
        torque: 0.05,
        display: UnitSystem::Inch,
        ..Spec::default()
    })
}

/// A long slender tube on a bar.
pub(crate) fn long_tube() -> Findings {
    findings(&Spec {
        title: "Roll tube on a core",
        parts: vec![("core", "C45+N", 40.0, 6.3), ("tube", "S355J2", 52.0, 6.3)],
        fits: vec![("H7/p6", [0.0, 25.0, 26.0, 42.0])],
        length: 1600.0,
        torque: 10.0,
        method: Method::HeatHub,
        ..Spec::default()
    })
}

/// A clearance fit: no pair grips, no load, no title.
pub(crate) fn clearance() -> Findings {
    findings(&Spec {
        parts: vec![("shaft", "C45+N", 60.0, 6.3), ("hub", "PA66", 100.0, 6.3)],
        fits: vec![("H7/g6", [0.0, 30.0, -29.0, -10.0])],
        ..Spec::default()
    })
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
    let mut inch = hollow_shaft().joint;
    inch.display = UnitSystem::Inch;
    vec![
        ("fan_hub", fan_hub()),
        ("hollow_shaft", hollow_shaft()),
        ("hollow_shaft_inch", compute(inch).unwrap()),
        ("big_rim", big_rim()),
        ("thin_bush", thin_bush()),
        ("transition", transition()),
        ("yielding", yielding()),
        ("three_rings", three_rings()),
        ("small_pin", small_pin()),
        ("long_tube", long_tube()),
        ("clearance", clearance()),
        ("hostile", hostile()),
    ]
}

fn findings(spec: &Spec) -> Findings {
    compute(joint(spec)).unwrap()
}

fn ring(part: &Part, inner: f64) -> Ring {
    static LIBRARY: OnceLock<Library> = OnceLock::new();
    let (name, material, outer, roughness) = part;
    let material = LIBRARY.get_or_init(Library::built_in).find(material).unwrap();
    let section = if inner > 0.0 { (outer / 1e3 - inner) / 2.0 } else { outer / 1e3 };
    let strength = material.strength_for(section).or(material.strength.last()).unwrap().clone();
    Ring {
        name: (*name).into(),
        section,
        strength,
        inner_diameter: inner,
        outer_diameter: outer / 1e3,
        roughness: Sourced::new(roughness * 1e-6, "joint file"),
        material,
    }
}

fn joint(spec: &Spec) -> Joint {
    let mut inner = spec.bore / 1e3;
    let mut rings: Vec<Ring> = Vec::new();
    for part in &spec.parts {
        rings.push(ring(part, inner));
        inner = part.2 / 1e3;
    }
    let um = 1e-6;
    let fits = spec.fits.iter().zip(&rings).map(|((callout, [a, b, c, d]), ring)| Fit {
        callout: (*callout).into(),
        limits: FitLimits {
            nominal: ring.outer_diameter,
            hole: Limits { lower: a * um, upper: b * um },
            shaft: Limits { lower: c * um, upper: d * um },
        },
        source: "ISO 286-2:2010".into(),
    });
    let range = |low, high| Sourced::new(Range { low, high }, "common practice, no source");
    let state = |name: &str, load: f64, temperature: f64| DutyState {
        torque: load * spec.torque,
        axial_force: spec.axial_force,
        ..DutyState::unloaded(name, vec![temperature; rings.len()])
    };
    Joint {
        title: spec.title.into(),
        drawing: Some("FH-204 rev C".into()),
        note: None,
        date: Some("2026-03-02".into()),
        diameter: rings[0].outer_diameter,
        length: spec.length / 1e3,
        relief: spec.relief / 1e3,
        fits: fits.collect(),
        bearing: None,
        order: (0..rings.len() - 1).collect(),
        slices: Vec::new(),
        friction: Friction {
            holding: range(0.12, 0.12),
            pressing: range(0.08, 0.14),
            release: range(0.1, 0.18),
        },
        duty: vec![state("rated", 1.0, 293.15), state("starting, warm", 1.3, 333.15)],
        assembly: AssemblyPlan {
            method: spec.method,
            shop_temperature: 293.15,
            clearance: Sourced::new(
                rings[0].outer_diameter / 1e3,
                "DIN 7190-1: a thousandth of the diameter",
            ),
            chamfer_angle: Sourced::new(5f64.to_radians(), "common practice, no source"),
            bath: Bath::LiquidNitrogen,
            hub_temperature_limit: None,
        },
        smoothing: Smoothing {
            loss: rings.windows(2).map(|p| 0.8 * (p[0].roughness.value + p[1].roughness.value)).collect(),
            factor: Some(0.8),
            rule: "0.8 of the sum of both Rz, DIN 7190:2001".into(),
            at: SmoothingAt::Loosest,
        },
        criterion: DuctileCriterion::VonMises,
        require: Requirements {
            slip_safety: 1.5,
            yield_safety: 1.2,
            fracture_safety: 1.6,
            press_force: (spec.method == Method::Press).then_some(150e3),
            allow: Allow::Elastic,
            yield_rule: YieldRule::Tresca,
        },
        population: Default::default(),
        display: spec.display,
        defaults: [
            ("friction.holding", "0.12", "common practice, no source"),
            ("assembly.clearance", "0.001 of the diameter", "DIN 7190-1"),
            ("require.fracture_safety", "1.6", "common practice, no source"),
            ("smoothing.factor", "0.8", "DIN 7190:2001"),
        ]
        .map(|(key, value, source)| DefaultTaken {
            key: key.into(),
            value: value.into(),
            source: source.into(),
        })
        .to_vec(),
        remarks: vec![],
        set: vec![("fit".into(), "H7/s6".into())],
        digest: "3f79bb7b435b05321651daefd374cdc681dc06faa65e374e38337b88ca046dea".into(),
        rings,
    }
}
