//! The loosest, mean and tightest pair side by side.

use maud::{Markup, html};

use super::table::{aligned, cell, pair_heads, range_cell, scrolling};
use super::{Sheet, part};
use crate::findings::{InterfaceFindings, OnsetOfYield, PairFindings, RingStress};
use crate::joint::{Ring, SmoothingAt};
use crate::material::{Kind, Range};
use crate::mechanics::criteria::DuctileCriterion;
use crate::report::plot;
use crate::report::units::Measure;

/// The table with a line on how the pairs are made.
pub(super) fn body(sheet: Sheet) -> Markup {
    let joint = &sheet.findings.joint;
    let smoothing = match joint.smoothing.at {
        SmoothingAt::Loosest => "lost at the loosest and the mean pair, kept at the tightest",
        SmoothingAt::Both => "lost at every pair",
        SmoothingAt::None => "kept at every pair",
    };
    html! {
        p {
            "At the shop temperature of " (sheet.units.text(Measure::Temperature, joint.assembly.shop_temperature))
            " and at rest. The loosest pair is the largest hole with the smallest shaft, the tightest the smallest "
            "hole with the largest shaft. Interference is diametral; what the roughness peaks lose is " (smoothing) "."
        }
        (scrolling("The extreme pairs", "extremes", &table(sheet)))
        @if !joint.slices.is_empty() {
            p {
                "The contact pressure is the mean over the seat; the stresses of a part are those of the slice where it is "
                "stressed most."
            }
        }
        @if plot::yields_by_design(sheet.findings) {
            @let hub = joint.rings.last().map_or("hub", |ring| ring.name.as_str());
            p {
                "The stresses of the " (hub) " in this table are those of an elastic " (hub) ": they show how far it is "
                "beyond its elastic limit. As it yields it is shown in " (part("pictures")) " and told in " (part("service")) "."
            }
        }
        @if let Some(onset) = &sheet.findings.onset_of_yield { p { (first_yield(sheet, onset)) } }
    }
}

/// Where strength is reached first, and how far the tightest pair is from it.
fn first_yield(sheet: Sheet, onset: &OnsetOfYield) -> String {
    let units = sheet.units;
    let ring = sheet.findings.joint.rings.get(onset.ring);
    let name = ring.map_or("ring", |ring| ring.name.as_str());
    let what = match ring.map(|ring| ring.material.kind) {
        Some(Kind::Brittle) => "reaches its tensile strength",
        _ => "begins to yield",
    };
    // A hub that may yield by design has another rule beside the criterion.
    let by = match (plot::yields_by_design(sheet.findings), sheet.findings.joint.criterion) {
        (false, _) => "",
        (true, DuctileCriterion::VonMises) => " by the von Mises criterion",
        (true, DuctileCriterion::Tresca) => " by the Tresca criterion",
    };
    format!(
        "The {name} is the first that {what}{by}: at a contact pressure of {}, which is an effective interference of {}.",
        units.brief(Measure::Pressure, onset.pressure).text(),
        units.text(Measure::Deviation, onset.interference),
    )
}

fn table(sheet: Sheet) -> Markup {
    let rings = &sheet.findings.joint.rings;
    html! {
        thead {
            tr { th scope="col" { "Quantity" } th scope="col" { "Unit" } (pair_heads(sheet)) }
        }
        @for index in 0..sheet.findings.joint.fits.len() {
            tbody { (interface_rows(sheet, index)) }
        }
        @for (index, ring) in rings.iter().enumerate() {
            tbody { (ring_rows(sheet, index, ring)) }
        }
        tbody {
            tr.group { th colspan="5" scope="rowgroup" { "Capacity and forces" } }
            (row(sheet, "torque at slip", Measure::Torque, |pair| Some(pair.torque_capacity)))
            (row(sheet, "axial force at slip", Measure::Force, |pair| Some(pair.axial_capacity)))
            (range_row(sheet, "press force, greatest", Measure::Force, |pair| pair.press_force))
            (range_row(sheet, "release force", Measure::Force, |pair| pair.release_force))
        }
    }
}

/// Interference and pressure at one interface; its name stands above when there are several.
fn interface_rows(sheet: Sheet, index: usize) -> Markup {
    let joint = &sheet.findings.joint;
    let name = |ring: usize| joint.rings.get(ring).map_or("", |ring| ring.name.as_str());
    let of = move |value: fn(&InterfaceFindings) -> f64| {
        move |pair: &PairFindings| pair.interfaces.get(index).map(value)
    };
    html! {
        @if joint.fits.len() > 1 {
            tr.group { th colspan="5" scope="rowgroup" { (name(index)) " in " (name(index + 1)) } }
        }
        (row(sheet, "interference", Measure::Deviation, of(|interface| interface.interference)))
        (row(sheet, "loss by smoothing", Measure::Deviation, of(|interface| {
            interface.interference - interface.effective_interference
        })))
        (row(sheet, "effective interference", Measure::Deviation, of(|interface| interface.effective_interference)))
        (row(sheet, "contact pressure", Measure::Pressure, of(|interface| interface.pressure)))
    }
}

fn ring_rows(sheet: Sheet, index: usize, ring: &Ring) -> Markup {
    let solid = sheet.findings.joint.is_solid(index);
    let last = index + 1 == sheet.findings.joint.rings.len();
    let inner = if solid { "at the centre" } else { "at the bore" };
    let equivalent = match (ring.material.kind, sheet.findings.joint.criterion) {
        (Kind::Brittle, _) => "greatest principal stress",
        (_, DuctileCriterion::VonMises) => "equivalent stress, von Mises",
        (_, DuctileCriterion::Tresca) => "equivalent stress, Tresca",
    };
    let strength = match ring.material.kind {
        Kind::Brittle => "safety against fracture",
        _ => "safety against yield",
    };
    let stress = |name: &str, value: fn(&RingStress) -> f64| {
        row(sheet, name, Measure::Pressure, |pair| pair.rings.get(index).map(value))
    };
    html! {
        tr.group { th colspan="5" scope="rowgroup" { (ring.name) " · " (ring.material.name) } }
        @if solid && is_uniform(sheet, index) {
            (stress("hoop and radial stress, throughout", |ring| ring.rim.hoop))
        } @else {
            (stress(&format!("hoop stress {inner}"), |ring| ring.bore.hoop))
            @if index > 0 || solid { (stress(&format!("radial stress {inner}"), |ring| ring.bore.radial)) }
            (stress("hoop stress at the outside", |ring| ring.rim.hoop))
            @if !last { (stress("radial stress at the outside", |ring| ring.rim.radial)) }
        }
        (stress(equivalent, |ring| ring.equivalent))
        (row(sheet, strength, Measure::Number, |pair| pair.rings.get(index).and_then(|ring| ring.safety)))
        @if !solid {
            (row(sheet, "change of inner diameter", Measure::Deviation, |pair| {
                pair.rings.get(index).map(|ring| ring.bore_change)
            }))
        }
        (row(sheet, "change of outer diameter", Measure::Deviation, |pair| {
            pair.rings.get(index).map(|ring| ring.outer_change)
        }))
    }
}

/// Whether the stress of a ring is the same everywhere and in every direction, as in a solid shaft at rest.
fn is_uniform(sheet: Sheet, index: usize) -> bool {
    sheet.findings.extremes.named().iter().all(|(_, pair)| {
        pair.rings.get(index).is_none_or(|ring| {
            let of = [ring.bore.radial, ring.rim.hoop, ring.rim.radial];
            of.iter().all(|stress| (stress - ring.bore.hoop).abs() < 1.0)
        })
    })
}

fn row(sheet: Sheet, name: &str, measure: Measure, value: impl Fn(&PairFindings) -> Option<f64>) -> Markup {
    let extremes = &sheet.findings.extremes;
    html! {
        tr {
            th scope="row" { (name) }
            td.u { (sheet.units.unit(measure)) }
            @for (_, pair) in extremes.named() {
                @match (measure, value(pair)) {
                    (Measure::Number, Some(value)) => (aligned(&super::table::safety(value))),
                    (_, value) => (cell(sheet.units, measure, value)),
                }
            }
        }
    }
}

fn range_row(sheet: Sheet, name: &str, measure: Measure, value: fn(&PairFindings) -> Range) -> Markup {
    html! {
        tr {
            th scope="row" { (name) }
            td.u { (sheet.units.unit(measure)) }
            @for (_, pair) in sheet.findings.extremes.named() {
                (range_cell(sheet.units, measure, value(pair)))
            }
        }
    }
}
