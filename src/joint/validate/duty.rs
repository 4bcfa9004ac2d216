//! The service states.

use super::assembly::within_curves;
use crate::joint::diagnose::Fault;
use crate::joint::draft::Draft;
use crate::joint::file::{JointFile, StateKeys};
use crate::joint::written::{At, Leaf, Written};
use crate::joint::{DutyState, Ring};
use crate::quantity::{Kind, Temperature, written};

/// The service states; one at the shop temperature without load when the file names none.
pub(super) fn states(
    draft: &mut Draft<'_>,
    file: &JointFile,
    rings: Option<&[Ring]>,
    shop: Option<f64>,
) -> Option<Vec<DutyState>> {
    let Some(list) = &file.duty else {
        draft.default("duty", "[{state: shop}]", "one state at the shop temperature, at rest, without load");
        let temperatures = vec![shop?; 2];
        let state = DutyState { name: "shop".into(), torque: 0.0, axial_force: 0.0, temperatures };
        return Some(vec![state]);
    };
    if list.value.is_empty() && !draft.faults.touch(list.node) {
        let fault = Fault::value(list.node, "`duty` lists no state");
        draft.faults.add(fault.help("add a state, or take the key out for one state without load"));
    }
    let mut names: Vec<String> = Vec::new();
    let mut states = Vec::new();
    for (number, item) in list.value.iter().enumerate() {
        refuse_what_is_not_calculated(draft, &item.value);
        let name = name(draft, &item.value, number, &names);
        states.push(state(draft, item, &name, rings, shop));
        names.push(name);
    }
    states.into_iter().collect()
}

fn refuse_what_is_not_calculated(draft: &Draft<'_>, keys: &StateKeys) {
    draft.not_yet(
        keys.speed.as_ref(),
        "the loss of contact pressure in rotation is not calculated",
        "take the key out for a slow joint; a fast one is not safe to judge without it",
    );
    let bending = "bending of the joint is not calculated";
    draft.not_yet(
        keys.bending_moment.as_ref(),
        bending,
        "judge it by hand, and give torque and axial force here",
    );
    draft.not_yet(
        keys.rotating_bending.as_ref(),
        bending,
        "judge it by hand, and give torque and axial force here",
    );
    let gradient = "a part is taken at one temperature throughout";
    let instead = "give `shaft_temperature` and `hub_temperature`, each the mean over the part";
    draft.not_yet(keys.inner_temperature.as_ref(), gradient, instead);
    draft.not_yet(keys.outer_temperature.as_ref(), gradient, instead);
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
    let temperatures = temperatures(draft, keys, name, rings, shop);
    Some(DutyState {
        name: name.to_owned(),
        torque: torque?,
        axial_force: axial_force?,
        temperatures: temperatures?,
    })
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

/// Temperature of the shaft and of the hub, K.
fn temperatures(
    draft: &mut Draft<'_>,
    keys: &StateKeys,
    state: &str,
    rings: Option<&[Ring]>,
    shop: Option<f64>,
) -> Option<Vec<f64>> {
    let parts = [("shaft_temperature", &keys.shaft_temperature), ("hub_temperature", &keys.hub_temperature)];
    if let Some(all) = &keys.temperature {
        for (key, given) in parts {
            if let Some(given) = given {
                let fault = Fault::key(given.node, format!("`{key}` and `temperature` are both given"));
                draft
                    .faults
                    .add(fault.help("`temperature` is for all parts: keep it, or give each part its own"));
            }
        }
        let temperature = draft.value(all)?;
        return checked(draft, all, temperature, rings.unwrap_or_default()).map(|t| vec![t; 2]);
    }
    let mut found = Vec::new();
    for (number, (key, given)) in parts.into_iter().enumerate() {
        found.push(match given {
            Some(given) => {
                let ring = rings.and_then(|rings| rings.get(number..=number)).unwrap_or_default();
                draft.value(given).and_then(|temperature| checked(draft, given, temperature, ring))
            }
            None => shop.inspect(|shop| {
                let value = written(Kind::Temperature, *shop);
                draft.default(format!("duty.{state}.{key}"), value, "the shop temperature");
            }),
        });
    }
    found.into_iter().collect()
}

fn checked(draft: &Draft<'_>, given: &Written<Temperature>, temperature: f64, rings: &[Ring]) -> Option<f64> {
    within_curves(draft, given, Some(temperature), rings).then_some(temperature)
}
