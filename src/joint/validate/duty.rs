//! The service states.

mod temperatures;

use crate::joint::diagnose::Fault;
use crate::joint::draft::Draft;
use crate::joint::file::{JointFile, StateKeys};
use crate::joint::leaf::FlagWord;
use crate::joint::written::{At, Leaf, Written};
use crate::joint::{DutyState, Ring};
use crate::quantity::Number;

/// The service states; one at the shop temperature without load when the file names none.
pub(super) fn states(
    draft: &mut Draft<'_>,
    file: &JointFile,
    rings: Option<&[Ring]>,
    shop: Option<f64>,
) -> Option<Vec<DutyState>> {
    let Some(list) = &file.duty else {
        draft.default("duty", "[{state: shop}]", "one state at the shop temperature, at rest, without load");
        let temperatures = vec![shop?; rings.map_or(2, <[Ring]>::len)];
        return Some(vec![DutyState::unloaded("shop", temperatures)]);
    };
    if list.value.is_empty() && !draft.faults.touch(list.node) {
        let fault = Fault::value(list.node, "`duty` lists no state");
        draft.faults.add(fault.help("add a state, or take the key out for one state without load"));
    }
    let mut names: Vec<String> = Vec::new();
    let mut states = Vec::new();
    for (number, item) in list.value.iter().enumerate() {
        let name = name(draft, &item.value, number, &names);
        states.push(state(draft, item, &name, rings, shop));
        names.push(name);
    }
    states.into_iter().collect()
}

fn name(draft: &Draft<'_>, keys: &StateKeys, number: usize, before: &[String]) -> String {
    let Some(given) = &keys.state else { return format!("state {}", number + 1) };
    let name = draft.value(given).unwrap_or_else(|| format!("state {}", number + 1));
    if before.contains(&name) {
        let fault = Fault::value(given.node, format!("two states are called `{name}`"));
        draft.faults.add(fault.help("give each state a name of its own"));
    }
    name
}

fn state(
    draft: &mut Draft<'_>,
    item: &At<StateKeys>,
    name: &str,
    rings: Option<&[Ring]>,
    shop: Option<f64>,
) -> Option<DutyState> {
    let keys = &item.value;
    let torque = load(draft, name, "torque", "0 N.m", keys.torque.as_ref());
    let axial_force = load(draft, name, "axial_force", "0 N", keys.axial_force.as_ref());
    let heat = temperatures::of_state(draft, item, name, rings, shop);
    let inner_pressure = size(draft, keys.inner_pressure.as_ref());
    if let (Some(given), Some(core)) = (&keys.inner_pressure, rings.and_then(<[Ring]>::first))
        && core.inner_diameter == 0.0
    {
        draft.refuse(given, &format!("cannot act: the {} is solid", core.name));
    }
    let outer_pressure = size(draft, keys.outer_pressure.as_ref());
    let speed = size(draft, keys.speed.as_ref());
    let bending_moment = size(draft, keys.bending_moment.as_ref());
    let radial_force = size(draft, keys.radial_force.as_ref());
    let rotating_bending = flag(draft, keys.rotating_bending.as_ref());
    let reversing = flag(draft, keys.reversing.as_ref());
    let relaxation = relaxation(draft, keys.relaxation.as_ref());
    let heat = heat?;
    Some(DutyState {
        torque: torque?,
        axial_force: axial_force?,
        temperature_rises: heat.rises,
        speed: speed?,
        inner_pressure: inner_pressure?,
        outer_pressure: outer_pressure?,
        bending_moment: bending_moment?,
        radial_force: radial_force?,
        rotating_bending: rotating_bending?,
        reversing: reversing?,
        relaxation: relaxation?,
        ..DutyState::unloaded(name, heat.inner)
    })
}

/// A size that is zero when the file is silent, and never negative.
fn size<L: Leaf<Value = f64>>(draft: &Draft<'_>, given: Option<&Written<L>>) -> Option<f64> {
    match given {
        None => Some(0.0),
        Some(given) => draft.not_negative(given),
    }
}

/// All of the pressure when the file is silent.
fn relaxation(draft: &Draft<'_>, given: Option<&Written<Number>>) -> Option<f64> {
    let Some(given) = given else { return Some(1.0) };
    let share = draft.value(given)?;
    if share > 0.0 && share <= 1.0 {
        return Some(share);
    }
    draft.refuse(given, "must be more than 0 and at most 1: the share of the pressure that is left");
    None
}

/// No when the file is silent.
fn flag(draft: &Draft<'_>, given: Option<&Written<FlagWord>>) -> Option<bool> {
    match given {
        None => Some(false),
        Some(given) => draft.value(given),
    }
}

fn load<L: Leaf<Value = f64>>(
    draft: &mut Draft<'_>,
    state: &str,
    key: &str,
    none: &str,
    given: Option<&Written<L>>,
) -> Option<f64> {
    let Some(given) = given else {
        draft.default(format!("duty.{state}.{key}"), none, "no load is given");
        return Some(0.0);
    };
    let load = draft.value(given)?;
    if load >= 0.0 {
        return Some(load);
    }
    draft.refuse(given, "is negative: give its size, the joint holds alike in both directions");
    None
}
