//! More than two rings: the list of rings, their fits, and the order in which they are joined.

use super::{fit, parts};
use crate::joint::diagnose::Fault;
use crate::joint::draft::Draft;
use crate::joint::file::{JointFile, RingKeys};
use crate::joint::tree::NodeId;
use crate::joint::written::{At, Written};
use crate::joint::{Fit, Ring};
use crate::material::roughness::Member;
use crate::quantity::{Kind, Number, UnitSystem, written};

/// Refuses the keys of two parts beside a list of rings.
pub(super) fn refuse_two_parts(draft: &Draft<'_>, file: &JointFile) {
    let keys = [
        ("shaft", file.shaft.as_ref().map(|at| at.node)),
        ("hub", file.hub.as_ref().map(|at| at.node)),
        ("fit", file.fit.as_ref().map(|at| at.node)),
        ("diameter", file.diameter.as_ref().map(|at| at.node)),
    ];
    for (key, node) in keys {
        if let Some(node) = node {
            let fault = Fault::key(node, format!("`{key}` and `rings` are both given"));
            draft.faults.add(fault.help("`rings` and `fits` stand in place of shaft, hub, fit and diameter"));
        }
    }
}

/// The rings from the innermost outwards.
pub(super) fn rings(draft: &mut Draft<'_>, list: &At<Vec<At<RingKeys>>>) -> Option<Vec<Ring>> {
    if list.value.len() < 2 {
        let fault = Fault::value(list.node, "`rings` needs two rings or more");
        draft.faults.add(fault.help("list them from the innermost outwards"));
        return None;
    }
    let mut inner = innermost_bore(draft, list);
    let mut rings = Vec::new();
    for (number, at) in list.value.iter().enumerate() {
        let ring = ring(draft, at, number, inner);
        inner = ring.as_ref().map(|ring| ring.outer_diameter);
        rings.push(ring);
    }
    let rings: Vec<Ring> = rings.into_iter().collect::<Option<_>>()?;
    let given: Vec<Option<NodeId>> =
        list.value.iter().map(|at| at.value.name.as_ref().map(|name| name.node)).collect();
    refuse_one_name_for_two(draft, &rings, &given);
    Some(rings)
}

/// Findings are told by the names of the rings.
pub(super) fn refuse_one_name_for_two(draft: &Draft<'_>, rings: &[Ring], given: &[Option<NodeId>]) {
    for (number, ring) in rings.iter().enumerate() {
        let Some(before) = rings.iter().take(number).position(|other| other.name == ring.name) else {
            continue;
        };
        let place = [number, before].into_iter().find_map(|of| given.get(of).copied().flatten());
        if let Some(node) = place {
            let fault = Fault::value(node, format!("two parts are called `{}`", ring.name));
            draft.faults.add(fault.help("give each part a name of its own"));
        }
    }
}

fn innermost_bore(draft: &mut Draft<'_>, list: &At<Vec<At<RingKeys>>>) -> Option<f64> {
    for outer in list.value.iter().skip(1) {
        if let Some(bore) = &outer.value.bore {
            let fault = Fault::key(bore.node, "only the innermost ring has a `bore` of its own");
            draft.faults.add(fault.help("the other rings begin where the ring inside them ends"));
        }
    }
    match list.value.first().and_then(|at| at.value.bore.as_ref()) {
        Some(given) => draft.zero_or_positive(given),
        None => {
            draft.default("rings.0.bore", "0 mm", "a solid core");
            Some(0.0)
        }
    }
}

fn ring(draft: &mut Draft<'_>, at: &At<RingKeys>, number: usize, inner: Option<f64>) -> Option<Ring> {
    let keys = &at.value;
    let given = draft.required(at.node, "outer_diameter", "110 mm", keys.outer_diameter.as_ref());
    let outer = given.and_then(|given| {
        let outer = draft.positive(given)?;
        if outer <= inner? {
            let inside = written(Kind::Length, inner?);
            draft
                .refuse(given, &format!("is not larger than the diameter {inside} at which the ring begins"));
            return None;
        }
        Some(outer)
    });
    let solid = inner == Some(0.0);
    let member = if number == 0 { Member::Shaft } else { Member::Hub };
    let key = format!("rings.{number}");
    let part = parts::Part {
        name: Some(draft.optional(keys.name.as_ref()).unwrap_or_else(|| format!("ring {}", number + 1))),
        node: at.node,
        material: parts::material(draft, at.node, "C45+N", keys.material.as_ref()),
        material_node: keys.material.as_ref().map(|material| material.node),
        section: keys.section.as_ref(),
        inner,
        outer,
        roughness: parts::roughness(draft, &key, keys.roughness.as_ref(), member),
        key,
    };
    let (section, source): (fn(f64, f64) -> f64, _) = if solid {
        (|_, outer| outer, parts::BAR_SECTION)
    } else {
        (|inner, outer| 0.5 * (outer - inner), parts::WALL_SECTION)
    };
    parts::ring(draft, part, section, source)
}

/// The fits between neighbours.
pub(super) fn fits(draft: &mut Draft<'_>, file: &JointFile, rings: Option<&[Ring]>) -> Option<Vec<Fit>> {
    let list = draft.required(draft.tree.root(), "fits", "[H7/s6, H7/s6]", file.fits.as_ref())?;
    let rings = rings?;
    if list.value.len() + 1 != rings.len() {
        let fault =
            format!("{} rings need {} fits, {} given", rings.len(), rings.len() - 1, list.value.len());
        draft.faults.add(Fault::value(list.node, fault).help("give one fit between each two neighbours"));
        return None;
    }
    let diameters = file.rings.iter().flat_map(|list| &list.value);
    let units: Vec<UnitSystem> =
        diameters.map(|at| fit::units_of(at.value.outer_diameter.as_ref())).collect();
    let mut fits = Vec::new();
    for ((given, ring), units) in list.value.iter().zip(rings).zip(units) {
        fits.push(fit::one(draft, given, Some(ring.outer_diameter), units, None));
    }
    fits.into_iter().collect()
}

/// The interfaces in the order in which they are joined, counted from 0.
pub(super) fn order(draft: &mut Draft<'_>, file: &JointFile, fits: usize) -> Option<Vec<usize>> {
    let Some(list) = &file.order else {
        draft.default("order", numbers(1..=fits), "joined from the innermost outwards");
        return Some((0..fits).collect());
    };
    let mut order = Vec::new();
    for given in &list.value {
        order.push(number(draft, given, fits, &order));
    }
    let order: Vec<usize> = order.into_iter().collect::<Option<_>>()?;
    if order.len() != fits {
        let fault = Fault::value(list.node, format!("`order` names {} of {fits} fits", order.len()));
        draft.faults.add(fault.help(format!("name each fit once, such as {}", numbers(1..=fits))));
        return None;
    }
    Some(order)
}

fn number(
    draft: &Draft<'_>,
    given: &Written<Number>,
    fits: usize,
    before: &[Option<usize>],
) -> Option<usize> {
    let value = draft.value(given)?;
    let found = (1..=fits).find(|number| *number as f64 == value);
    let Some(found) = found else {
        draft.refuse(given, &format!("is no fit: they are numbered 1 to {fits} from the innermost outwards"));
        return None;
    };
    if before.contains(&Some(found - 1)) {
        draft.refuse(given, "stands twice in the order");
        return None;
    }
    Some(found - 1)
}

fn numbers(range: std::ops::RangeInclusive<usize>) -> String {
    let all: Vec<String> = range.map(|number| number.to_string()).collect();
    format!("[{}]", all.join(", "))
}
