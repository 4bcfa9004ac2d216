//! Temperatures of the parts in a service state: uniform in each part, or steady conduction through all.

use crate::joint::Ring;
use crate::joint::diagnose::Fault;
use crate::joint::draft::Draft;
use crate::joint::file::StateKeys;
use crate::joint::tree::NodeId;
use crate::joint::validate::assembly::within_curves;
use crate::joint::written::{At, Written};
use crate::quantity::{Kind, Temperature, written};

/// Temperatures of the rings, K, innermost first.
pub(super) struct Heat {
    /// At the inner face of each ring.
    pub(super) inner: Vec<f64>,
    /// From inner to outer face of each ring; empty without a gradient.
    pub(super) rises: Vec<f64>,
}

/// Temperatures of the parts in a state.
pub(super) fn of_state(
    draft: &mut Draft<'_>,
    item: &At<StateKeys>,
    state: &str,
    rings: Option<&[Ring]>,
    shop: Option<f64>,
) -> Option<Heat> {
    let keys = &item.value;
    match (&keys.inner_temperature, &keys.outer_temperature) {
        (None, None) => {
            uniform(draft, keys, state, rings, shop).map(|inner| Heat { inner, rises: Vec::new() })
        }
        (Some(inner), Some(outer)) => {
            refuse_both(draft, keys);
            gradient(draft, inner, outer, rings?)
        }
        (Some(given), None) | (None, Some(given)) => {
            let help = "a gradient needs both: `inner_temperature` and `outer_temperature`";
            draft.faults.add(Fault::key(given.node, "one end of the gradient is missing").help(help));
            None
        }
    }
}

/// A gradient fixes every temperature: others beside it contradict it.
fn refuse_both(draft: &Draft<'_>, keys: &StateKeys) {
    let others = [
        ("temperature", keys.temperature.as_ref().map(|at| at.node)),
        ("temperatures", keys.temperatures.as_ref().map(|at| at.node)),
        ("shaft_temperature", keys.shaft_temperature.as_ref().map(|at| at.node)),
        ("hub_temperature", keys.hub_temperature.as_ref().map(|at| at.node)),
    ];
    for (key, node) in others {
        if let Some(node) = node {
            let fault = Fault::key(node, format!("`{key}` and a gradient are both given"));
            draft
                .faults
                .add(fault.help("keep `inner_temperature` and `outer_temperature`, or the part's own"));
        }
    }
}

/// Steady radial conduction through all rings: the drops stand as ln(r_o/r_i)/k; a solid core is of one temperature.
///
/// Source: Carslaw & Jaeger, *Conduction of Heat in Solids*, 2nd ed., § 7.2 (composite hollow cylinder); the contact
/// resistance of the joints is left out.
fn gradient(
    draft: &Draft<'_>,
    inner: &Written<Temperature>,
    outer: &Written<Temperature>,
    rings: &[Ring],
) -> Option<Heat> {
    let (from, to) = (draft.value(inner)?, draft.value(outer)?);
    let within =
        within_curves(draft, inner, Some(from), rings) & within_curves(draft, outer, Some(to), rings);
    let mut resistances = Vec::new();
    for ring in rings {
        if ring.inner_diameter == 0.0 {
            resistances.push(0.0);
            continue;
        }
        let Some(conductivity) = &ring.material.conductivity else {
            draft.refuse(outer, &format!("needs the conductivity of {} ({})", ring.material.id, ring.name));
            return None;
        };
        resistances.push((ring.outer_diameter / ring.inner_diameter).ln() / conductivity.value);
    }
    let total: f64 = resistances.iter().sum();
    let rises: Vec<f64> = resistances.iter().map(|resistance| (to - from) * resistance / total).collect();
    let starts = rises.iter().scan(from, |at, rise| {
        let start = *at;
        *at += rise;
        Some(start)
    });
    within.then(|| Heat { inner: starts.collect(), rises: rises.clone() })
}

/// Temperature of each part, uniform in it, K.
fn uniform(
    draft: &mut Draft<'_>,
    keys: &StateKeys,
    state: &str,
    rings: Option<&[Ring]>,
    shop: Option<f64>,
) -> Option<Vec<f64>> {
    let parts = [("shaft_temperature", &keys.shaft_temperature), ("hub_temperature", &keys.hub_temperature)];
    if let Some(list) = &keys.temperatures {
        refuse_beside(draft, keys, list.node);
    }
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
        let count = rings.map_or(2, <[Ring]>::len);
        return checked(draft, all, temperature, rings.unwrap_or_default()).map(|t| vec![t; count]);
    }
    if let Some(list) = &keys.temperatures {
        return of_list(draft, list, rings?);
    }
    let mut found = Vec::new();
    if rings.is_some_and(|rings| rings.len() > 2) {
        for (key, given) in parts {
            if let Some(given) = given {
                let fault = Fault::key(given.node, format!("`{key}` is for two parts"));
                draft.faults.add(fault.help("give `temperature`, or `temperatures` with one for each ring"));
            }
        }
        let shop = shop?;
        let value = written(Kind::Temperature, shop);
        draft.default(format!("duty.{state}.temperature"), value, "the shop temperature");
        return Some(vec![shop; rings?.len()]);
    }
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

/// `temperatures` names every ring: another temperature beside it contradicts it.
fn refuse_beside(draft: &Draft<'_>, keys: &StateKeys, node: NodeId) {
    let others = [
        ("temperature", &keys.temperature),
        ("shaft_temperature", &keys.shaft_temperature),
        ("hub_temperature", &keys.hub_temperature),
    ];
    for (key, _) in others.into_iter().filter(|(_, given)| given.is_some()) {
        let fault = Fault::key(node, format!("`{key}` and `temperatures` are both given"));
        draft.faults.add(fault.help("`temperatures` has one for each ring: keep it, or the other"));
    }
}

/// One temperature for each ring, innermost first.
fn of_list(draft: &Draft<'_>, list: &At<Vec<Written<Temperature>>>, rings: &[Ring]) -> Option<Vec<f64>> {
    if list.value.len() != rings.len() {
        let fault = format!("`temperatures` has {} for {} rings", list.value.len(), rings.len());
        draft.faults.add(Fault::value(list.node, fault).help("give one for each ring, innermost first"));
        return None;
    }
    let found: Vec<Option<f64>> = list
        .value
        .iter()
        .zip(rings)
        .map(|(given, ring)| checked(draft, given, draft.value(given)?, std::slice::from_ref(ring)))
        .collect();
    found.into_iter().collect()
}

fn checked(draft: &Draft<'_>, given: &Written<Temperature>, temperature: f64, rings: &[Ring]) -> Option<f64> {
    within_curves(draft, given, Some(temperature), rings).then_some(temperature)
}
