//! The two parts: materials, diameters, roughness, and the ruling section that picks the strength.

use std::sync::Arc;

use serde::Deserialize;

use crate::assembly::bearing_tables::BearingRing;
use crate::joint::diagnose::Fault;
use crate::joint::draft::Draft;
use crate::joint::file::{JointFile, ShaftKeys};
use crate::joint::leaf::{GivenRoughness, MaterialKeys, MaterialName, Roughness};
use crate::joint::tree::NodeId;
use crate::joint::written::{At, TextOr, Written};
use crate::joint::{BearingSeat, Ring};
use crate::material::record::{MaterialRecord, Step};
use crate::material::roughness::{self, Member};
use crate::material::{Material, Origin, Sourced};
use crate::quantity::{Kind, Length, written};

pub(super) const BAR_SECTION: &str =
    "the diameter of a bar (common practice for ruling sections of heat-treated steel, no source)";
pub(super) const WALL_SECTION: &str =
    "the thickness of the wall (common practice for ruling sections of heat-treated steel, no source)";

/// A part as far as both kinds of part are alike.
pub(super) struct Part<'f> {
    pub(super) key: String,
    pub(super) node: NodeId,
    pub(super) name: Option<String>,
    pub(super) material: Option<Arc<Material>>,
    pub(super) material_node: Option<NodeId>,
    pub(super) section: Option<&'f Written<Length>>,
    pub(super) inner: Option<f64>,
    pub(super) outer: Option<f64>,
    pub(super) roughness: Option<Sourced<f64>>,
}

/// Shaft and hub.
pub(super) fn rings(
    draft: &mut Draft<'_>,
    file: &JointFile,
    diameter: Option<f64>,
    seat: Option<&BearingSeat>,
) -> Option<Vec<Ring>> {
    let (inner, outer) = match seat.map(|seat| seat.ring) {
        Some(BearingRing::Inner) => (None, seat),
        Some(BearingRing::Outer) => (seat, None),
        None => (None, None),
    };
    let root = draft.tree.root();
    let shaft = draft.required(root, "shaft", "{material: C45+N}", file.shaft.as_ref());
    let shaft = shaft.and_then(|at| shaft_ring(draft, at, file, diameter, inner));
    let example = "{material: EN-GJL-250, outer_diameter: 110 mm}";
    let hub = draft.required(root, "hub", example, file.hub.as_ref());
    let hub = hub.and_then(|at| {
        let keys = &at.value;
        let outer_diameter = match (&keys.outer_diameter, &keys.steps) {
            _ if outer.is_some() => outer.map(BearingSeat::raceway),
            (None, Some(steps)) => super::steps::largest_outer_diameter(draft, steps),
            (given, _) => draft
                .required(at.node, "outer_diameter", "110 mm", given.as_ref())
                .and_then(|given| larger_than_joint(draft, given, file, diameter)),
        };
        let part = Part {
            key: "hub".to_owned(),
            node: at.node,
            name: draft.optional(keys.name.as_ref()).or(outer.map(|seat| seat.ring_name().to_owned())),
            material: material_of(draft, at.node, ("hub", "EN-GJL-250"), keys.material.as_ref(), outer),
            material_node: keys.material.as_ref().map(|material| material.node),
            section: keys.section.as_ref(),
            inner: diameter,
            outer: outer_diameter,
            roughness: roughness_of(draft, "hub", keys.roughness.as_ref(), Member::Hub, outer),
        };
        ring(draft, part, |inner, outer| 0.5 * (outer - inner), WALL_SECTION)
    });
    let rings = vec![shaft?, hub?];
    let name_of_shaft = file.shaft.as_ref().and_then(|at| at.value.name.as_ref());
    let name_of_hub = file.hub.as_ref().and_then(|at| at.value.name.as_ref());
    let given = [name_of_shaft, name_of_hub].map(|name| name.map(|name| name.node));
    super::rings::refuse_one_name_for_two(draft, &rings, &given);
    Some(rings)
}

fn shaft_ring(
    draft: &mut Draft<'_>,
    at: &At<ShaftKeys>,
    file: &JointFile,
    diameter: Option<f64>,
    seat: Option<&BearingSeat>,
) -> Option<Ring> {
    let keys = &at.value;
    let material_found = material_of(draft, at.node, ("shaft", "C45+N"), keys.material.as_ref(), seat);
    let part = Part {
        key: "shaft".to_owned(),
        node: at.node,
        name: draft.optional(keys.name.as_ref()).or(seat.map(|seat| seat.ring_name().to_owned())),
        material: material_found,
        material_node: keys.material.as_ref().map(|material| material.node),
        section: keys.section.as_ref(),
        inner: match seat {
            Some(seat) => Some(seat.raceway()),
            None => bore(draft, keys.bore.as_ref(), file, diameter),
        },
        outer: diameter,
        roughness: roughness_of(draft, "shaft", keys.roughness.as_ref(), Member::Shaft, seat),
    };
    match seat {
        Some(_) => ring(draft, part, |inner, outer| 0.5 * (outer - inner), WALL_SECTION),
        None => ring(draft, part, |_, outer| outer, BAR_SECTION),
    }
}

pub(super) fn ring(
    draft: &mut Draft<'_>,
    part: Part<'_>,
    usual_section: impl Fn(f64, f64) -> f64,
    section_source: &str,
) -> Option<Ring> {
    let material = part.material?;
    let (inner, outer) = (part.inner?, part.outer?);
    let section = match part.section {
        Some(given) => draft.positive(given)?,
        None => {
            let section = tidy(usual_section(inner, outer));
            draft.default(format!("{}.section", part.key), written(Kind::Length, section), section_source);
            section
        }
    };
    let Some(strength) = material.strength_for(section).cloned() else {
        let node = part.section.map(|given| given.node).or(part.material_node).unwrap_or(part.node);
        draft.faults.add(no_strength(node, &material, section));
        return None;
    };
    Some(Ring {
        name: part.name.unwrap_or(part.key),
        material,
        section,
        strength,
        inner_diameter: inner,
        outer_diameter: outer,
        roughness: part.roughness?,
    })
}

/// A computed length without the noise of its last digits, to the picometre.
fn tidy(length: f64) -> f64 {
    (length * 1e12).round() / 1e12
}

fn no_strength(node: NodeId, material: &Material, section: f64) -> Fault {
    let largest = material.strength.iter().filter_map(|row| row.section_up_to).fold(0.0, f64::max);
    let text = |length| written(Kind::Length, length);
    Fault::value(
        node,
        format!(
            "{} has no strength for a ruling section of {}: its table ends at {}",
            material.id,
            text(section),
            text(largest)
        ),
    )
    .help("give `section` if the piece was treated at a smaller section, or write the material here with its strength")
}

fn bore(
    draft: &mut Draft<'_>,
    given: Option<&Written<Length>>,
    file: &JointFile,
    diameter: Option<f64>,
) -> Option<f64> {
    let Some(given) = given else {
        draft.default("shaft.bore", "0 mm", "a solid shaft");
        return Some(0.0);
    };
    let bore = draft.zero_or_positive(given)?;
    if bore >= diameter? {
        draft.refuse(given, &format!("is not smaller than the mating {}", called_diameter(draft, file)));
        return None;
    }
    Some(bore)
}

fn larger_than_joint(
    draft: &Draft<'_>,
    given: &Written<Length>,
    file: &JointFile,
    diameter: Option<f64>,
) -> Option<f64> {
    let outer = draft.positive(given)?;
    if outer <= diameter? {
        draft.refuse(given, &format!("is not larger than the mating {}", called_diameter(draft, file)));
        return None;
    }
    Some(outer)
}

fn called_diameter(draft: &Draft<'_>, file: &JointFile) -> String {
    file.diameter.as_ref().map_or_else(|| "diameter".to_owned(), |given| draft.called(given))
}

/// The material of a part; a bearing ring need not name it.
fn material_of(
    draft: &mut Draft<'_>,
    part: NodeId,
    (key, example): (&str, &str),
    given: Option<&At<TextOr<MaterialName, MaterialKeys>>>,
    seat: Option<&BearingSeat>,
) -> Option<Arc<Material>> {
    if given.is_some() || seat.is_none() {
        return material(draft, part, example, given);
    }
    let (name, source) = super::bearing::MATERIAL;
    draft.default(format!("{key}.material"), name, source);
    match draft.library.find(name) {
        Ok(material) => Some(material),
        Err(error) => {
            draft.faults.add(Fault::key(part, error.to_string()).help(error.help()));
            None
        }
    }
}

/// The roughness of a part; that of a bearing ring is a ground one unless it is given.
fn roughness_of(
    draft: &mut Draft<'_>,
    part: &str,
    given: Option<&Written<Roughness>>,
    member: Member,
    seat: Option<&BearingSeat>,
) -> Option<Sourced<f64>> {
    if given.is_some() || seat.is_none() {
        return roughness(draft, part, given, member);
    }
    let (depth, source) = super::bearing::ROUGHNESS;
    draft.default(format!("{part}.roughness"), format!("Rz {}", written(Kind::Length, depth)), source);
    Some(Sourced::new(depth, source))
}

pub(super) fn material(
    draft: &Draft<'_>,
    part: NodeId,
    example: &str,
    given: Option<&At<TextOr<MaterialName, MaterialKeys>>>,
) -> Option<Arc<Material>> {
    let given = draft.required(part, "material", example, given)?;
    match &given.value {
        TextOr::Text(text) => {
            let name = draft.value(&At { node: given.node, value: text.clone() })?;
            match draft.library.find(&name) {
                Ok(material) => Some(material),
                Err(error) => {
                    draft.faults.add(Fault::value(given.node, error.to_string()).help(error.help()));
                    None
                }
            }
        }
        TextOr::Keys(_) => in_place(draft, given.node),
    }
}

/// A material written in the joint file.
fn in_place(draft: &Draft<'_>, node: NodeId) -> Option<Arc<Material>> {
    let record = match MaterialRecord::deserialize(draft.reader(node)) {
        Ok(record) => record,
        Err(refusal) => {
            if !draft.faults.touch_within(draft.tree, node) {
                draft.faults.add(refusal.fault(node));
            }
            return None;
        }
    };
    if draft.faults.touch_within(draft.tree, node) {
        return None;
    }
    let part = draft.tree.parent(node).and_then(|(part, _)| draft.tree.key(part)).unwrap_or("part");
    let id = record.name.clone().unwrap_or_else(|| format!("material of the {part}"));
    match record.into_material(&id, Origin::JointFile) {
        Ok(material) => Some(Arc::new(material)),
        Err(error) => {
            let (at, reached) = follow(draft, node, &error.path);
            let fault = if reached { Fault::value(at, error.message) } else { Fault::key(at, error.message) };
            draft.faults.add(fault.maybe_help(error.help));
            None
        }
    }
}

/// The value at the end of a path below `node`, or the last one on the way that is there.
fn follow(draft: &Draft<'_>, node: NodeId, path: &[Step]) -> (NodeId, bool) {
    let mut at = node;
    for step in path {
        let next = match step {
            Step::Key(key) => draft.tree.get(at, key),
            Step::Index(number) => draft.tree.item(at, *number),
        };
        match next {
            Some(next) => at = next,
            None => return (at, false),
        }
    }
    (at, true)
}

pub(super) fn roughness(
    draft: &mut Draft<'_>,
    part: &str,
    given: Option<&Written<Roughness>>,
    member: Member,
) -> Option<Sourced<f64>> {
    let Some(given) = given else {
        let usual = roughness::default_rz(member);
        let value = format!("Rz {}", written(Kind::Length, usual.value));
        draft.default(format!("{part}.roughness"), value, usual.source.to_string());
        return Some(usual);
    };
    match draft.value(given)? {
        GivenRoughness::Rz(depth) => Some(Sourced::new(depth, "joint file")),
        GivenRoughness::Ra(depth) => {
            let converted = roughness::rz_from_ra(depth);
            draft.remarks.push(format!(
                "The roughness {} of the {part} was taken as Rz {} ({}).",
                given.value.text.trim(),
                written(Kind::Length, tidy(converted.value)),
                converted.source
            ));
            Some(converted)
        }
    }
}
