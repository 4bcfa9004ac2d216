//! The document as a whole, in the order in which it is written.

use serde::Serialize;

use super::absent;
use super::assembly::Assembly;
use super::bearing::Bearing;
use super::duty::Duty;
use super::limits::Fit;
use super::number::{celsius, finite, giga, mega, microns, millimetres};
use super::pair::Pair;
use super::service::Service;
use crate::findings::{Findings, OnsetOfYield, Question, Verdict, VerdictUnit};
use crate::joint::{DefaultTaken, Joint};
use crate::material::Origin;
use crate::report::terminal::character_name;

/// Everything.
#[derive(Serialize)]
pub(super) struct Document {
    findings: u8,
    version: &'static str,
    title: String,
    digest: String,
    set: Vec<String>,
    diameter_mm: f64,
    callout: String,
    character: &'static str,
    fit: Option<Fit>,
    extremes: Extremes,
    onset_of_yield: Option<Onset>,
    duty: Vec<Duty>,
    service: Service,
    assembly: Assembly,
    bearing: Option<Bearing>,
    verdicts: Vec<VerdictLine>,
    defaults: Vec<DefaultLine>,
    materials: Vec<MaterialLine>,
    cautions: Vec<String>,
    notes: Vec<String>,
}

/// The extreme pairs and the mean one.
#[derive(Serialize)]
struct Extremes {
    loosest: Pair,
    mean: Pair,
    tightest: Pair,
}

/// Where the first ring begins to yield or to break.
#[derive(Serialize)]
struct Onset {
    ring: String,
    pressure_mpa: Option<f64>,
    interference_um: f64,
}

/// One requirement with what was found; `unit` is of both.
#[derive(Serialize)]
struct VerdictLine {
    question: &'static str,
    subject: String,
    required: Option<f64>,
    found: Option<f64>,
    unit: &'static str,
    ok: bool,
    at: String,
}

/// A default that was taken because the joint file is silent.
#[derive(Serialize)]
struct DefaultLine {
    key: String,
    value: String,
    source: String,
}

/// The material of one ring.
#[derive(Serialize)]
struct MaterialLine {
    ring: String,
    id: String,
    name: String,
    origin: String,
    strength_mpa: Option<f64>,
    section_mm: f64,
    youngs_modulus_gpa: f64,
    youngs_modulus_curve: Option<String>,
}

impl Document {
    pub(super) fn of(findings: &Findings) -> Self {
        let joint = &findings.joint;
        let extremes = &findings.extremes;
        let states = joint.duty.iter().zip(&findings.duty);
        let mut document = Self {
            findings: 1,
            version: env!("CARGO_PKG_VERSION"),
            title: joint.title.clone(),
            digest: joint.digest.clone(),
            set: joint.set.iter().map(|(key, value)| format!("{key}={value}")).collect(),
            diameter_mm: millimetres(joint.diameter),
            callout: joint.fits.first().map(|fit| fit.callout.clone()).unwrap_or_default(),
            character: character_name(findings.character),
            fit: joint.fits.first().map(|fit| Fit::of(&fit.limits)),
            extremes: Extremes {
                loosest: Pair::of(joint, &extremes.loosest),
                mean: Pair::of(joint, &extremes.mean),
                tightest: Pair::of(joint, &extremes.tightest),
            },
            onset_of_yield: findings.onset_of_yield.as_ref().map(|onset| Onset::of(joint, onset)),
            duty: states.map(|(state, found)| Duty::of(joint, state, found)).collect(),
            service: Service::of(findings),
            assembly: Assembly::of(findings),
            bearing: Bearing::of(findings),
            verdicts: findings.verdicts.iter().map(VerdictLine::of).collect(),
            defaults: joint.defaults.iter().map(DefaultLine::of).collect(),
            materials: materials(findings),
            cautions: findings.cautions.iter().map(|caution| caution.text.clone()).collect(),
            notes: findings.notes.clone(),
        };
        document.notes.extend(absent::notes(&document));
        document
    }
}

impl Onset {
    fn of(joint: &Joint, onset: &OnsetOfYield) -> Self {
        Self {
            ring: joint.rings.get(onset.ring).map(|ring| ring.name.clone()).unwrap_or_default(),
            pressure_mpa: mega(onset.pressure),
            interference_um: microns(onset.interference),
        }
    }
}

impl VerdictLine {
    fn of(verdict: &Verdict) -> Self {
        let number = |value: f64| match verdict.unit {
            VerdictUnit::Temperature => celsius(value),
            VerdictUnit::Safety | VerdictUnit::Force | VerdictUnit::Share | VerdictUnit::Time => value,
        };
        Self {
            question: match verdict.question {
                Question::Hold => "hold",
                Question::Strength => "strength",
                Question::Assembly => "assembly",
            },
            subject: verdict.subject.clone(),
            required: verdict.required.map(number).and_then(finite),
            found: verdict.found.map(number).and_then(finite),
            unit: match verdict.unit {
                VerdictUnit::Safety | VerdictUnit::Share => "1",
                VerdictUnit::Force => "N",
                VerdictUnit::Temperature => "degC",
                VerdictUnit::Time => "s",
            },
            ok: verdict.ok,
            at: verdict.at.clone(),
        }
    }
}

impl DefaultLine {
    fn of(default: &DefaultTaken) -> Self {
        Self { key: default.key.clone(), value: default.value.clone(), source: default.source.clone() }
    }
}

fn materials(findings: &Findings) -> Vec<MaterialLine> {
    let rings = findings.joint.rings.iter().zip(&findings.extremes.tightest.rings);
    rings
        .map(|(ring, stress)| MaterialLine {
            ring: ring.name.clone(),
            id: ring.material.id.clone(),
            name: ring.material.name.clone(),
            origin: match &ring.material.origin {
                Origin::BuiltIn => "built in".to_owned(),
                Origin::File(path) => path.display().to_string(),
                Origin::JointFile => "joint file".to_owned(),
            },
            strength_mpa: stress.strength.and_then(mega),
            section_mm: millimetres(ring.section),
            youngs_modulus_gpa: giga(ring.material.youngs_modulus.value),
            youngs_modulus_curve: ring
                .material
                .youngs_modulus_curve
                .as_ref()
                .map(|curve| curve.source.to_string()),
        })
        .collect()
}
