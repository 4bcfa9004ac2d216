//! A bearing ring in place of hub or shaft: its sizes, its limits by ISO 492, its clearance group.

use crate::assembly::bearing::{BearingKind, effective_raceways};
use crate::assembly::bearing_tables::{
    BearingClass, BearingRing, ClearanceGroup, bearing_limits, radial_clearance,
};
use crate::joint::bearing_keys::BearingKeys;
use crate::joint::diagnose::Fault;
use crate::joint::draft::Draft;
use crate::joint::file::JointFile;
use crate::joint::written::{At, Written};
use crate::joint::{AssemblyPlan, BearingSeat, Ring};
use crate::material::Sourced;
use crate::quantity::{Kind, Length, written};

/// Material of a ring when the file is silent.
pub(super) const MATERIAL: (&str, &str) =
    ("100Cr6", "through-hardened bearing steel, the usual one of rings (ISO 683-17)");
/// Roughness Rz of the fitted surface of a ring when the file is silent, m.
pub(super) const ROUGHNESS: (f64, &str) = (2e-6, "ground surface of a bearing ring (from memory)");
/// How much warmer the inner ring runs than the outer when the file is silent, K.
const HOTTER: (f64, &str) =
    (10.0, "inner rings usually run 5 K to 10 K warmer than outer ones (bearing handbooks, from memory)");

/// The bearing of the joint, when hub or shaft is one; the outer none when it cannot be understood.
pub(super) fn seat(draft: &mut Draft<'_>, file: &JointFile) -> Option<Option<BearingSeat>> {
    let inner = file.hub.as_ref().and_then(|hub| hub.value.bearing.as_ref());
    let outer = file.shaft.as_ref().and_then(|shaft| shaft.value.bearing.as_ref());
    let (ring, section, keys) = match (inner, outer) {
        (None, None) => return Some(None),
        (Some(_), Some(outer)) => {
            let fault = Fault::key(outer.node, "both parts are bearings");
            draft.faults.add(fault.help("in `hub` stands a bearing whose inner ring sits on the shaft, in `shaft` one whose outer ring sits in a housing"));
            return None;
        }
        (Some(keys), None) => (BearingRing::Inner, "hub", keys),
        (None, Some(keys)) => (BearingRing::Outer, "shaft", keys),
    };
    refuse_idle_keys(draft, file, ring);
    of_keys(draft, ring, section, keys).map(Some)
}

/// Keys that the bearing itself answers.
fn refuse_idle_keys(draft: &Draft<'_>, file: &JointFile, ring: BearingRing) {
    let refuse = |node, key: &str| {
        let fault = Fault::key(node, format!("`{key}` stands beside `bearing`"));
        draft.faults.add(fault.help("the bearing gives the size of its ring; take one of the two out"));
    };
    let hub = file.hub.as_ref().map(|hub| &hub.value);
    let shaft = file.shaft.as_ref().map(|shaft| &shaft.value);
    if let (BearingRing::Inner, Some(given)) = (ring, hub.and_then(|hub| hub.outer_diameter.as_ref())) {
        refuse(given.node, "outer_diameter");
    }
    if let (BearingRing::Outer, Some(given)) = (ring, shaft.and_then(|shaft| shaft.bore.as_ref())) {
        refuse(given.node, "bore");
    }
    let steps = [
        hub.and_then(|hub| hub.steps.as_ref()).map(|steps| steps.node),
        shaft.and_then(|shaft| shaft.steps.as_ref()).map(|steps| steps.node),
    ];
    for node in steps.into_iter().flatten() {
        let fault = Fault::key(node, "`steps` do not go with `bearing`");
        draft.faults.add(fault.help("give one section for the part under or round the bearing"));
    }
}

fn of_keys(
    draft: &mut Draft<'_>,
    ring: BearingRing,
    section: &str,
    at: &At<BearingKeys>,
) -> Option<BearingSeat> {
    let keys = &at.value;
    let size = |key, example, given: Option<&Written<Length>>| {
        draft.required(at.node, key, example, given).and_then(|given| draft.positive(given))
    };
    let bore = size("bore", "50 mm", keys.bore.as_ref());
    let outside_diameter = size("outside_diameter", "90 mm", keys.outside_diameter.as_ref());
    let width = size("width", "20 mm", keys.width.as_ref());
    let kind = word(draft, section, "type", "ball", keys.kind.as_ref(), BearingKind::Ball);
    let group = word(draft, section, "clearance", "CN", keys.clearance.as_ref(), ClearanceGroup::CN);
    let class = word(draft, section, "class", "normal", keys.class.as_ref(), BearingClass::Normal);
    let inner_hotter_by = hotter(draft, section, keys);
    let (bore, outside_diameter) = (bore?, outside_diameter?);
    if let Some(given) = keys.outside_diameter.as_ref().filter(|_| outside_diameter <= bore) {
        draft.refuse(given, &format!("is not larger than the bore {}", written(Kind::Length, bore)));
        return None;
    }
    let (kind, clearance, class) = (kind?, group?, class?);
    let (inner_raceway, outer_raceway) = raceways(draft, section, keys, (kind, bore, outside_diameter))?;
    let fitted = match ring {
        BearingRing::Inner => (bore, keys.bore.as_ref()),
        BearingRing::Outer => (outside_diameter, keys.outside_diameter.as_ref()),
    };
    let limits = match bearing_limits(class, ring, fitted.0) {
        Ok(limits) => limits,
        Err(error) => {
            let node = fitted.1.map_or(at.node, |given| given.node);
            draft.faults.add(Fault::value(node, error.to_string()).help("give the limits of the ring: `fit: {hole: {lower: -12 um, upper: 0 um}, shaft: k6}` with an ordinary hub"));
            return None;
        }
    };
    if let Err(error) = radial_clearance(kind, clearance, bore) {
        let node = keys.clearance.as_ref().map_or(at.node, |given| given.node);
        draft.faults.add(Fault::value(node, format!("no clearance is known for this bearing: {error}")).help("ball bearings of 2.5 to 250 mm bore (C4 and C5 over 6 mm) and roller bearings to 500 mm are known"));
        return None;
    }
    Some(BearingSeat {
        ring,
        kind,
        bore,
        outside_diameter,
        width: width?,
        clearance,
        class,
        inner_raceway,
        outer_raceway,
        limits,
        inner_hotter_by: inner_hotter_by?,
    })
}

fn word<L: crate::joint::written::Leaf>(
    draft: &mut Draft<'_>,
    section: &str,
    key: &str,
    usual: &str,
    given: Option<&Written<L>>,
    silent: L::Value,
) -> Option<L::Value> {
    match given {
        Some(given) => draft.value(given),
        None => {
            draft.default(
                format!("{section}.bearing.{key}"),
                usual,
                "the usual one, without a suffix in the designation",
            );
            Some(silent)
        }
    }
}

/// Rings that differ by more have lost their clearance long before, K; common practice, no source.
const MOST_APART: f64 = 100.0;

fn hotter(draft: &mut Draft<'_>, section: &str, keys: &BearingKeys) -> Option<Sourced<f64>> {
    match &keys.inner_hotter_by {
        Some(given) => {
            let value = draft.value(given)?;
            if value.abs() > MOST_APART {
                draft
                    .refuse(given, "is more than the rings of a bearing differ by: at most 100 K either way");
                return None;
            }
            Some(Sourced::new(value, "joint file"))
        }
        None => {
            draft.default(format!("{section}.bearing.inner_hotter_by"), "10 K", HOTTER.1);
            Some(Sourced::new(HOTTER.0, HOTTER.1))
        }
    }
}

/// Raceways as given, else the usual estimate.
fn raceways(
    draft: &mut Draft<'_>,
    section: &str,
    keys: &BearingKeys,
    (kind, bore, outside): (BearingKind, f64, f64),
) -> Option<(f64, f64)> {
    let (inner, outer) = effective_raceways(kind, bore, outside).ok()?;
    let mut of = |key: &str, given: Option<&Written<Length>>, usual: f64| match given {
        Some(given) => {
            let raceway = draft.positive(given)?;
            if raceway <= bore || raceway >= outside {
                draft.refuse(given, "does not lie between bore and outside diameter");
                return None;
            }
            Some(raceway)
        }
        None => {
            let usual = (usual * 1e9).round() / 1e9;
            let source = "(D + 4d)/5 and (4D + d)/5 of ball, (D + 3d)/4 and (3D + d)/4 of roller bearings (bearing handbooks, from memory)";
            draft.default(format!("{section}.bearing.{key}"), written(Kind::Length, usual), source);
            Some(usual)
        }
    };
    let inner = of("inner_raceway", keys.inner_raceway.as_ref(), inner);
    let outer = of("outer_raceway", keys.outer_raceway.as_ref(), outer);
    let (inner, outer) = (inner?, outer?);
    if let Some(given) =
        keys.outer_raceway.as_ref().or(keys.inner_raceway.as_ref()).filter(|_| outer <= inner)
    {
        draft.refuse(given, "leaves no room for the rolling elements");
        return None;
    }
    Some((inner, outer))
}

/// The mating diameter: that of the ring, which a `diameter` in the file must not contradict.
pub(super) fn diameter(draft: &mut Draft<'_>, file: &JointFile, seat: &BearingSeat) -> Option<f64> {
    let own = seat.diameter();
    let Some(given) = &file.diameter else {
        draft.default(
            "diameter",
            written(Kind::Length, own),
            format!("the {} of the bearing", surface(seat.ring)),
        );
        return Some(own);
    };
    let diameter = draft.positive(given)?;
    if (diameter - own).abs() > 1e-9 {
        let what =
            format!("is not the {} of the bearing, {}", surface(seat.ring), written(Kind::Length, own));
        draft.refuse(given, &what);
        return None;
    }
    Some(own)
}

/// The length of the seat, which a ring cannot exceed.
pub(super) fn within_width(
    draft: &Draft<'_>,
    given: &Written<Length>,
    seat: Option<&BearingSeat>,
) -> Option<f64> {
    let length = draft.positive(given)?;
    let Some(seat) = seat.filter(|seat| length - seat.width > 1e-9) else { return Some(length) };
    let width = written(Kind::Length, seat.width);
    draft.refuse(given, &format!("is more than the width {width} of the bearing"));
    None
}

fn surface(ring: BearingRing) -> &'static str {
    match ring {
        BearingRing::Inner => "bore",
        BearingRing::Outer => "outside diameter",
    }
}

/// Highest temperature of a ring while mounting, K: 120 °C, where neither its material nor the file has another limit.
const HOTTEST: f64 = 393.15;

/// Keeps the ring within the limit of bearings while it is heated.
pub(super) fn keep_cool(plan: &mut AssemblyPlan, seat: &BearingSeat, rings: &[Ring]) {
    let limited = rings.get(1).is_some_and(|ring| ring.material.max_temperature.is_some());
    if seat.ring == BearingRing::Inner && !limited && plan.hub_temperature_limit.is_none() {
        plan.hub_temperature_limit = Some(HOTTEST);
    }
}
