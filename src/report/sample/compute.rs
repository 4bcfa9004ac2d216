//! The findings of a sample, from Lamé's formulas.

use std::sync::Arc;

use super::parts::Spec;
use super::worksheet::worksheet;
use crate::assembly::press::{PressCurve, PressPoint};
use crate::findings::*;
use crate::joint::*;
use crate::material::{Kind, Range, Sourced};
use crate::mechanics::criteria::DuctileCriterion;
use crate::tolerance::{Extremes, FitLimits, Limits};

const SHOP: f64 = 293.15;

/// All findings of the described joint.
pub(crate) fn findings(spec: &Spec) -> Findings {
    let joint = joint(spec);
    let character = joint.fits[0].limits.character();
    let interference = |pick: fn(&Extremes<f64>) -> f64| -> Vec<f64> {
        joint.fits.iter().map(|fit| pick(&fit.limits.interference())).collect()
    };
    let extremes = Extremes {
        loosest: pair(&joint, &interference(|e| e.loosest), true),
        mean: pair(&joint, &interference(|e| e.mean), true),
        tightest: pair(&joint, &interference(|e| e.tightest), false),
    };
    let duty = joint
        .duty
        .iter()
        .map(|state| DutyFindings {
            loosest: in_state(state, &extremes.loosest),
            tightest: in_state(state, &extremes.tightest),
        })
        .collect();
    let assembly = assembly(&joint, &extremes);
    let mut findings = Findings {
        worksheet: worksheet(&joint, &extremes),
        joint,
        character,
        extremes,
        duty,
        assembly,
        onset_of_yield: None,
        verdicts: vec![],
        cautions: cautions(),
        notes: vec![
            "The formulas hold for a hub as long as the seat; at the ends of a hub on a through shaft the contact pressure is about 1.5 to 1.7 times the mean.".into(),
            "Bending of the shaft is not covered.".into(),
        ],
    };
    findings.verdicts = verdicts(&findings);
    findings
}

fn cautions() -> Vec<Caution> {
    let caution =
        |subject, text: &str, source: &str| Caution { subject, text: text.into(), source: source.into() };
    vec![
        caution(
            "press",
            "Do not stop while pressing: starting again takes a higher force.",
            "common practice, no source",
        ),
        caution("heat", "Measure the temperature at the bore, not at the rim.", "common practice, no source"),
        caution(
            "cold",
            "Wear cold-proof gloves and a face shield; nitrogen displaces the air in a closed room.",
            "common practice, no source",
        ),
        caution(
            "strength",
            "The sharp edges of the hub raise the pressure there; relieve them.",
            "common practice, no source",
        ),
    ]
}

fn joint(spec: &Spec) -> Joint {
    let um = 1e-6;
    let mut inner = spec.parts[0].inner.unwrap_or(0.0) / 1e3;
    let rings: Vec<Ring> = spec
        .parts
        .iter()
        .map(|part| {
            let ring = Ring {
                name: part.name.into(),
                material: Arc::new(part.material.clone()),
                section: part.outer / 1e3 - inner,
                strength: part.material.strength[0].clone(),
                inner_diameter: inner,
                outer_diameter: part.outer / 1e3,
                roughness: Sourced::new(part.roughness * um, "joint file"),
            };
            inner = ring.outer_diameter;
            ring
        })
        .collect();
    let fits: Vec<Fit> = spec
        .fits
        .iter()
        .zip(&rings)
        .map(|((callout, [a, b, c, d]), ring)| Fit {
            callout: (*callout).into(),
            limits: FitLimits {
                nominal: ring.outer_diameter,
                hole: Limits { lower: a * um, upper: b * um },
                shaft: Limits { lower: c * um, upper: d * um },
            },
            source: "ISO 286-2:2010".into(),
        })
        .collect();
    let states = rings.len();
    let range = |low, high| Sourced::new(Range { low, high }, "common practice, no source");
    Joint {
        title: spec.title.into(),
        drawing: Some("FH-204 rev C".into()),
        note: None,
        date: Some("2026-03-02".into()),
        diameter: rings[0].outer_diameter,
        length: spec.length / 1e3,
        relief: spec.relief / 1e3,
        smoothing: Smoothing {
            loss: rings.windows(2).map(|p| 0.8 * (p[0].roughness.value + p[1].roughness.value)).collect(),
            factor: Some(0.8),
            rule: "0.8 of the sum of Rz, DIN 7190:2001".into(),
            at: SmoothingAt::Loosest,
        },
        friction: Friction {
            holding: range(0.12, 0.12),
            pressing: range(0.08, 0.14),
            release: range(0.1, 0.18),
        },
        duty: vec![
            DutyState {
                name: "rated".into(),
                torque: spec.torque,
                axial_force: spec.axial_force,
                temperatures: vec![SHOP; states],
            },
            DutyState {
                name: "starting, warm".into(),
                torque: 1.3 * spec.torque,
                axial_force: spec.axial_force,
                temperatures: vec![SHOP + 40.0; states],
            },
        ],
        assembly: AssemblyPlan {
            method: spec.method,
            shop_temperature: SHOP,
            clearance: Sourced::new(
                rings[0].outer_diameter / 1e3,
                "DIN 7190-1: a thousandth of the diameter",
            ),
            chamfer_angle: Sourced::new(5f64.to_radians(), "common practice, no source"),
            bath: Bath::LiquidNitrogen,
            hub_temperature_limit: None,
        },
        criterion: DuctileCriterion::VonMises,
        require: Requirements {
            slip_safety: 1.5,
            yield_safety: 1.2,
            fracture_safety: 2.0,
            press_force: None,
        },
        display: spec.display,
        defaults: vec![
            default("friction.holding", "0.12", "common practice, no source"),
            default("assembly.clearance", "0.001 of the diameter", "DIN 7190-1"),
            default("require.fracture_safety", "2", "common practice, no source"),
        ],
        set: vec![("fit".into(), "H7/s6".into())],
        digest: "3f79bb7b435b05321651daefd374cdc681dc06faa65e374e38337b88ca046dea".into(),
        fits,
        rings,
    }
}

fn default(key: &str, value: &str, source: &str) -> DefaultTaken {
    DefaultTaken { key: key.into(), value: value.into(), source: source.into() }
}

/// Contact pressures of a stack, all joints closed: the gaps of methods of Lamé, solved together.
fn pressures(joint: &Joint, effective: &[f64]) -> Vec<f64> {
    let count = effective.len();
    let mut matrix = nalgebra::DMatrix::<f64>::zeros(count, count);
    let mut right = nalgebra::DVector::<f64>::zeros(count);
    for k in 0..count {
        let r = joint.rings[k].outer_diameter / 2.0;
        right[k] = effective[k] / 2.0;
        for (j, column) in [(k.wrapping_sub(1), -1), (k, 0), (k + 1, 1)] {
            if j >= count {
                continue;
            }
            let mut unit = vec![0.0; count];
            unit[j] = 1.0;
            let _ = column;
            let at = |ring: usize| {
                (if ring == 0 { 0.0 } else { unit[ring - 1] }, unit.get(ring).copied().unwrap_or(0.0))
            };
            matrix[(k, j)] =
                displacement(&joint.rings[k + 1], at(k + 1), r) - displacement(&joint.rings[k], at(k), r);
        }
    }
    matrix.lu().solve(&right).unwrap().iter().map(|p| p.max(0.0)).collect()
}

fn displacement(ring: &Ring, (inside, outside): (f64, f64), r: f64) -> f64 {
    let (radial, hoop) = stress(ring, (inside, outside), r);
    (hoop - ring.material.poisson.value * radial) / ring.material.youngs_modulus.value * r
}

fn stress(ring: &Ring, (inside, outside): (f64, f64), r: f64) -> (f64, f64) {
    let (a, b) = (ring.inner_diameter / 2.0, ring.outer_diameter / 2.0);
    if a == 0.0 {
        return (-outside, -outside);
    }
    let wall = b * b - a * a;
    let mean = (inside * a * a - outside * b * b) / wall;
    let swing = (inside - outside) * a * a * b * b / (wall * r * r);
    (mean - swing, mean + swing)
}

fn pair(joint: &Joint, interference: &[f64], smoothed: bool) -> PairFindings {
    let loss = |take: bool| -> Vec<f64> {
        interference.iter().zip(&joint.smoothing.loss).map(|(u, g)| u - if take { *g } else { 0.0 }).collect()
    };
    let effective = loss(smoothed);
    let pressure = pressures(joint, &effective);
    let p = pressure[0];
    let d = joint.diameter;
    let area = std::f64::consts::PI * d * (joint.length - joint.relief);
    let friction = &joint.friction;
    PairFindings {
        interference: interference[0],
        smoothing: if smoothed { joint.smoothing.loss[0] } else { 0.0 },
        effective_interference: effective[0],
        pressure: p,
        pressure_smoothed: pressures(joint, &loss(true))[0],
        pressure_unsmoothed: pressures(joint, &loss(false))[0],
        rings: (0..joint.rings.len()).map(|k| ring_stress(joint, k, &pressure)).collect(),
        torque_capacity: friction.holding.value.low * p * area * d / 2.0,
        axial_capacity: friction.holding.value.low * p * area,
        press_force: Range {
            low: friction.pressing.value.low * p * area,
            high: friction.pressing.value.high * p * area,
        },
        release_force: Range {
            low: friction.release.value.low * p * area,
            high: friction.release.value.high * p * area,
        },
    }
}

fn ring_stress(joint: &Joint, k: usize, pressure: &[f64]) -> RingStress {
    let ring = &joint.rings[k];
    let inside = if k == 0 { 0.0 } else { pressure[k - 1] };
    let outside = pressure.get(k).copied().unwrap_or(0.0);
    let face = |r: f64| {
        let (radial, hoop) = stress(ring, (inside, outside), r);
        FaceStress {
            radial,
            hoop,
            von_mises: (radial * radial + hoop * hoop - radial * hoop).sqrt(),
            tresca: (radial - hoop).abs().max(radial.abs()).max(hoop.abs()),
        }
    };
    let (bore, rim) = (face(ring.inner_diameter / 2.0), face(ring.outer_diameter / 2.0));
    let brittle = ring.material.kind == Kind::Brittle;
    let equivalent = if brittle { bore.hoop.max(rim.hoop) } else { bore.von_mises.max(rim.von_mises) };
    let strength = if brittle { ring.strength.tensile_strength } else { ring.strength.yield_strength };
    RingStress {
        bore,
        rim,
        equivalent,
        strength,
        safety: strength.filter(|_| equivalent > 0.0).map(|s| s / equivalent),
        bore_change: 2.0 * displacement(ring, (inside, outside), ring.inner_diameter / 2.0),
        outer_change: 2.0 * displacement(ring, (inside, outside), ring.outer_diameter / 2.0),
    }
}

fn in_state(state: &DutyState, pair: &PairFindings) -> StateFindings {
    let share = (state.torque / pair.torque_capacity).hypot(state.axial_force / pair.axial_capacity);
    StateFindings {
        pressure: pair.pressure,
        torque_capacity: pair.torque_capacity,
        axial_capacity: pair.axial_capacity,
        slip_safety: (state.torque + state.axial_force > 0.0)
            .then(|| if pair.pressure > 0.0 { 1.0 / share } else { 0.0 }),
        rings: pair.rings.clone(),
    }
}

fn press_curve(joint: &Joint, pair: &PairFindings, friction: f64) -> PressCurve {
    let length = joint.length - joint.relief;
    let slope = joint.assembly.chamfer_angle.value.tan();
    let lead_in = (pair.effective_interference / (2.0 * slope)).max(0.0);
    let per_length = std::f64::consts::PI * joint.diameter * pair.pressure;
    let k = (friction + slope) / (1.0 - friction * slope);
    let force = |s: f64| {
        if s < lead_in {
            per_length * k * s * s / (2.0 * lead_in)
        } else if s <= length {
            per_length * (k * lead_in / 2.0 + friction * (s - lead_in))
        } else {
            per_length * friction * length
        }
    };
    let points = (0..=60)
        .map(|i| length * f64::from(i) / 60.0)
        .map(|travel| PressPoint { travel, force: force(travel) });
    PressCurve {
        points: points.collect(),
        lead_in,
        peak_force: force(length),
        peak_travel: length,
        final_force: per_length * friction * length,
        work: per_length * friction * length * length / 2.0,
    }
}

fn temperature_for(ring: &Ring, strain: f64) -> Option<f64> {
    let (low, high) = ring.material.expansion.range();
    (0..=4000)
        .map(|i| if strain > 0.0 { SHOP + f64::from(i) / 10.0 } else { SHOP - f64::from(i) / 10.0 })
        .take_while(|t| *t >= low && *t <= high)
        .find(|t| {
            ring.material
                .expansion
                .strain(*t)
                .is_ok_and(|e| if strain > 0.0 { e >= strain } else { e <= strain })
        })
}

fn assembly(joint: &Joint, extremes: &Extremes<PairFindings>) -> AssemblyFindings {
    let (shaft, hub) = (&joint.rings[joint.rings.len() - 2], &joint.rings[joint.rings.len() - 1]);
    let d = shaft.outer_diameter;
    let clearance = joint.assembly.clearance.value;
    let needed = extremes.tightest.interference + clearance;
    let limit = hub
        .material
        .max_temperature
        .as_ref()
        .map(|limit| (limit.value, format!("{}: {}", hub.material.name, limit.source)));
    let route = |temperature: Option<f64>, possible: bool, what: &str| ThermalRoute {
        temperature,
        possible,
        statement: match temperature {
            Some(t) => format!("{what} to {:.0} °C clears the tightest pair.", t - 273.15),
            None => format!("{what} cannot clear the tightest pair: the expansion curve ends before."),
        },
    };
    let hot = temperature_for(hub, needed / d);
    let cold = temperature_for(shaft, -needed / d);
    let hot_possible = hot.is_some_and(|t| limit.as_ref().is_none_or(|(most, _)| t <= *most));
    let bath = |bath, name: &str, temperature: f64| {
        let shrinkage = shaft.material.expansion.strain(temperature).ok().map(|e| -e * d);
        let rest = shrinkage.map_or(needed, |s| needed - s);
        BathFindings {
            bath,
            temperature,
            shrinkage,
            hub_temperature: if rest <= 0.0 { Some(SHOP) } else { temperature_for(hub, rest / d) },
            alone: rest <= 0.0,
            statement: format!("The shaft shrinks in {name}."),
        }
    };
    AssemblyFindings {
        press: Extremes {
            loosest: press_curve(joint, &extremes.loosest, joint.friction.pressing.value.low),
            mean: press_curve(
                joint,
                &extremes.mean,
                0.5 * (joint.friction.pressing.value.low + joint.friction.pressing.value.high),
            ),
            tightest: press_curve(joint, &extremes.tightest, joint.friction.pressing.value.high),
        },
        press_rating: 1.2 * extremes.tightest.press_force.high,
        heat_hub: route(hot, hot_possible, "Heating the hub"),
        chill_shaft: route(cold, cold.is_some(), "Chilling the shaft"),
        baths: vec![
            bath(Bath::DryIce, "dry ice", 194.65),
            bath(Bath::LiquidNitrogen, "liquid nitrogen", 77.36),
        ],
        clearance,
        needed,
        hub_limit: limit,
    }
}

fn verdicts(findings: &Findings) -> Vec<Verdict> {
    let slip = findings.duty.iter().filter_map(|duty| duty.loosest.slip_safety).reduce(f64::min);
    let require = &findings.joint.require;
    let mut all = vec![Verdict {
        question: Question::Hold,
        subject: "slip safety".into(),
        required: Some(require.slip_safety),
        found: slip,
        unit: VerdictUnit::Safety,
        ok: slip.is_none_or(|s| s >= require.slip_safety),
        at: "loosest pair, starting, warm".into(),
    }];
    for (ring, stress) in findings.joint.rings.iter().zip(&findings.extremes.tightest.rings) {
        let brittle = ring.material.kind == Kind::Brittle;
        let required = if brittle { require.fracture_safety } else { require.yield_safety };
        all.push(Verdict {
            question: Question::Strength,
            subject: format!("{} safety of the {}", if brittle { "fracture" } else { "yield" }, ring.name),
            required: Some(required),
            found: stress.safety,
            unit: VerdictUnit::Safety,
            ok: stress.safety.is_none_or(|s| s >= required),
            at: "tightest pair, at the shop temperature, at rest".into(),
        });
    }
    let (subject, found, unit, ok) = match findings.joint.assembly.method {
        Method::Press => {
            ("press force", Some(findings.extremes.tightest.press_force.high), VerdictUnit::Force, true)
        }
        Method::HeatHub => (
            "hub temperature",
            findings.assembly.heat_hub.temperature,
            VerdictUnit::Temperature,
            findings.assembly.heat_hub.possible,
        ),
        Method::ChillShaft => (
            "shaft temperature",
            findings.assembly.chill_shaft.temperature,
            VerdictUnit::Temperature,
            findings.assembly.chill_shaft.possible,
        ),
        Method::HeatAndChill => {
            ("hub temperature", findings.assembly.baths[1].hub_temperature, VerdictUnit::Temperature, true)
        }
    };
    all.push(Verdict {
        question: Question::Assembly,
        subject: subject.into(),
        required: (unit == VerdictUnit::Temperature && findings.joint.assembly.method != Method::ChillShaft)
            .then(|| findings.assembly.hub_limit.clone().unwrap().0),
        found,
        unit,
        ok,
        at: "tightest pair".into(),
    });
    all
}
