//! A stepped joint: the pieces of hub and shaft cut into slices of one section each.

use crate::joint::Slice;
use crate::joint::diagnose::Fault;
use crate::joint::draft::Draft;
use crate::joint::file::{HubStepKeys, JointFile, ShaftStepKeys};
use crate::joint::tree::NodeId;
use crate::joint::written::{At, Written};
use crate::quantity::{Kind, Length, written};

/// Pieces may miss the length of the hub by this share of it: decimal inches do not add up exactly.
const CLOSE: f64 = 1e-6;

/// The largest outer diameter of a stepped hub.
pub(super) fn largest_outer_diameter(draft: &Draft<'_>, steps: &At<Vec<At<HubStepKeys>>>) -> Option<f64> {
    let diameters = steps.value.iter().filter_map(|step| step.value.outer_diameter.as_ref());
    let found: Vec<Option<f64>> = diameters.map(|given| draft.positive(given)).collect();
    let found: Option<Vec<f64>> = found.into_iter().collect();
    found?.into_iter().max_by(f64::total_cmp)
}

/// The slices from the end that enters first; empty when neither part is stepped.
pub(super) fn slices(
    draft: &Draft<'_>,
    file: &JointFile,
    diameter: Option<f64>,
    length: Option<f64>,
) -> Option<Vec<Slice>> {
    let hub = file.hub.as_ref();
    let shaft = file.shaft.as_ref();
    let hub_steps = hub.and_then(|at| at.value.steps.as_ref());
    let shaft_steps = shaft.and_then(|at| at.value.steps.as_ref());
    if hub_steps.is_none() && shaft_steps.is_none() {
        return Some(Vec::new());
    }
    let (diameter, length) = (diameter?, length?);
    let hub_pieces = match hub_steps {
        Some(steps) => pieces(draft, steps, length, |step| hub_piece(draft, step, diameter)),
        None => {
            let outer = hub.and_then(|at| at.value.outer_diameter.as_ref())?;
            Some(vec![(length, draft.value(outer)?)])
        }
    };
    let shaft_pieces = match shaft_steps {
        Some(steps) => pieces(draft, steps, length, |step| shaft_piece(draft, step, diameter)),
        None => {
            let bore = shaft.and_then(|at| at.value.bore.as_ref());
            Some(vec![(length, bore.map_or(Some(0.0), |given| draft.value(given))?)])
        }
    };
    Some(cut(&hub_pieces?, &shaft_pieces?))
}

/// Length and size of each piece; a fault when they do not make up the length of the hub.
fn pieces<T>(
    draft: &Draft<'_>,
    steps: &At<Vec<At<T>>>,
    length: f64,
    piece: impl Fn(&At<T>) -> Option<(f64, f64)>,
) -> Option<Vec<(f64, f64)>> {
    let found: Vec<Option<(f64, f64)>> = steps.value.iter().map(piece).collect();
    let found: Vec<(f64, f64)> = found.into_iter().collect::<Option<_>>()?;
    let sum: f64 = found.iter().map(|(length, _)| length).sum();
    if (sum - length).abs() > CLOSE * length {
        let text = |length| written(Kind::Length, length);
        let fault = format!("the steps are {} long together, the hub is {}", text(sum), text(length));
        draft.faults.add(Fault::key(steps.node, fault).help("the lengths of the steps add up to `length`"));
        return None;
    }
    Some(found)
}

fn hub_piece(draft: &Draft<'_>, step: &At<HubStepKeys>, diameter: f64) -> Option<(f64, f64)> {
    let length = step_length(draft, step.node, step.value.length.as_ref());
    let given = draft.required(step.node, "outer_diameter", "110 mm", step.value.outer_diameter.as_ref())?;
    let outer = draft.positive(given)?;
    if outer <= diameter {
        let mating = written(Kind::Length, diameter);
        draft.refuse(given, &format!("is not larger than the mating diameter {mating}"));
        return None;
    }
    Some((length?, outer))
}

fn shaft_piece(draft: &Draft<'_>, step: &At<ShaftStepKeys>, diameter: f64) -> Option<(f64, f64)> {
    let length = step_length(draft, step.node, step.value.length.as_ref());
    let given = draft.required(step.node, "bore", "20 mm", step.value.bore.as_ref())?;
    let bore = draft.zero_or_positive(given)?;
    if bore >= diameter {
        let mating = written(Kind::Length, diameter);
        draft.refuse(given, &format!("is not smaller than the mating diameter {mating}"));
        return None;
    }
    Some((length?, bore))
}

fn step_length(draft: &Draft<'_>, step: NodeId, given: Option<&Written<Length>>) -> Option<f64> {
    draft.required(step, "length", "20 mm", given).and_then(|given| draft.positive(given))
}

/// Cuts the joint wherever hub or shaft changes.
fn cut(hub: &[(f64, f64)], shaft: &[(f64, f64)]) -> Vec<Slice> {
    let (mut hub, mut shaft) = (hub.iter().copied(), shaft.iter().copied());
    let (mut hub_piece, mut shaft_piece) = (hub.next(), shaft.next());
    let mut slices = Vec::new();
    while let (Some((hub_length, outer)), Some((shaft_length, bore))) = (hub_piece, shaft_piece) {
        let length = hub_length.min(shaft_length);
        slices.push(Slice { length, hub_outer_diameter: outer, shaft_bore: bore });
        let rest = |whole: f64| if whole - length > CLOSE * whole { Some(whole - length) } else { None };
        hub_piece = rest(hub_length).map(|rest| (rest, outer)).or_else(|| hub.next());
        shaft_piece = rest(shaft_length).map(|rest| (rest, bore)).or_else(|| shaft.next());
    }
    slices
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn cuts_where_either_part_changes() {
        let slices = cut(&[(0.02, 0.07), (0.03, 0.1)], &[(0.03, 0.0), (0.02, 0.02)]);
        let found: Vec<(f64, f64, f64)> = slices
            .iter()
            .map(|slice| ((slice.length * 1e6).round(), slice.hub_outer_diameter, slice.shaft_bore))
            .collect();
        assert_eq!(found, [(20e3, 0.07, 0.0), (10e3, 0.1, 0.0), (20e3, 0.1, 0.02)]);
    }
}
