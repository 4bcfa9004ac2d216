//! Findings as JSON, version 1: fixed names, units in the names, full precision.
//!
//! NaN and infinity never appear: a quantity that does not exist is `null`, and `notes` has a sentence that begins
//! with its name and says why. Names are only ever added. `rings` and `interfaces` run from the
//! innermost outwards, `steps` in the order of assembly; without a suffix for a unit a number is a pure number.
//!
//! | name | what it is |
//! |---|---|
//! | `file` | of several files the one that the object is of; absent when there is only one |
//! | `findings` | version of this format: 1 |
//! | `version` | version of the program |
//! | `title`, `digest`, `set` | of the joint file: its title, the SHA-256 of its text, changes made by `--set` |
//! | `diameter_mm`, `callout`, `character` | nominal diameter, fit as written; `clearance`, `transition`, `interference` |
//! | `fit` | `hole` and `shaft`, each with `lower_um` and `upper_um` from nominal |
//! | `extremes` | `loosest`, `mean`, `tightest`: the pair at the shop temperature, at rest |
//! | `onset_of_yield` | `ring` that yields or breaks first, with `pressure_mpa` and `interference_um` |
//! | `duty` | each state: what acts, Young's modulus of each ring at its temperature, and `loosest` and `tightest` in it |
//! | `service` | `loosening` of each interface, which fits are `governing` each ring, `steps` of assembly, the `plastic` hub, `fatigue` |
//! | `assembly` | `method`, temperatures, clearance, forces of the tightest pair, `baths`, the joints made `earlier`, times, `cold_bath`, `press_work`, `oil_injection` |
//! | `bearing` | of a bearing seat: loss of radial clearance, what is left cold and in each state, mounting; else null |
//! | `verdicts` | `question` (hold, strength, assembly), `subject`, `required`, `found`, `unit` (1, N, degC), `ok`, `at` |
//! | `defaults` | `key`, `value`, `source` of what the joint file leaves open |
//! | `materials` | for each ring its material, where the record comes from, the strength for its section, Young's modulus at 20 °C and the source of its curve |
//! | `cautions`, `notes` | sentences |
//!
//! A pair of `extremes`:
//!
//! | name | what it is |
//! |---|---|
//! | `interference_um` | diametral interference as made, negative for clearance |
//! | `smoothing_um` | loss by smoothing that was taken |
//! | `effective_interference_um` | interference that grips |
//! | `shop_interference_um` | the same with the difference of free growth from 20 °C to the shop temperature |
//! | `pressure_mpa` | contact pressure; `pressure_smoothed_mpa` and `pressure_unsmoothed_mpa` with and without the loss |
//! | `hub_bore_*`, `hub_rim_*` | stress in the outermost ring |
//! | `shaft_surface_*`, `shaft_bore_*` | stress in the innermost ring; of a solid shaft `shaft_bore` is the centre |
//! | `shaft_von_mises_mpa` | the greater of its two faces |
//! | `torque_capacity_nm`, `axial_capacity_n` | torque and axial force at which it slips |
//! | `press_force_n`, `release_force_n` | greatest over the friction range; `press_force_low_n`, `release_force_low_n` least |
//! | `interfaces` | `diameter_mm`, interferences, `pressure_mpa`, `gap_um`, whether `open`, capacities |
//! | `rings` | `name`, stress at bore and rim, `equivalent_mpa`, `strength_mpa`, `yield_safety`, changes of diameter |
//! | `slices` | of a stepped joint: its slices with their pressure and rings; else empty |
//!
//! A pair in a state of `duty` has `pressure_mpa`, `torque_capacity_nm`, `axial_capacity_n`, `slip_safety`,
//! `hub_yield_safety`, `shaft_yield_safety`, `bending`, `interfaces` and `rings`.

mod absent;
mod assembly;
mod bearing;
mod document;
mod duty;
mod limits;
mod number;
mod pair;
mod seating;
mod service;

use serde::Serialize;

use crate::findings::Findings;
use crate::tolerance::Member;
use crate::tolerance::callout::{Resolved, ResolvedMember};

/// The findings of a joint as JSON text with a line break at its end.
pub fn to_json(findings: &Findings) -> String {
    text(&document::Document::of(findings))
}

/// The same of one of several files, whose name stands first as `file`.
pub fn to_json_of(file: &str, findings: &Findings) -> String {
    text(&Named { file, document: document::Document::of(findings) })
}

/// A document with the name of its file.
#[derive(Serialize)]
struct Named<'f> {
    file: &'f str,
    #[serde(flatten)]
    document: document::Document,
}

/// Limits of a fit as JSON: the object `fit` as in the findings, `character`, `interference`.
pub fn fit_limits(callout: &str, resolved: &Resolved) -> String {
    text(&limits::LimitsDocument::of(callout, resolved))
}

/// Limits of one member as JSON.
pub fn member_limits(nominal: f64, member: Member, resolved: &ResolvedMember) -> String {
    text(&limits::MemberDocument::of(nominal, member, resolved))
}

fn text(document: &impl Serialize) -> String {
    let mut text = serde_json::to_string_pretty(document).unwrap_or_default();
    text.push('\n');
    text
}
