//! How the parts scatter.

use crate::joint::diagnose::Fault;
use crate::joint::draft::Draft;
use crate::joint::file::JointFile;
use crate::joint::leaf::ROUGHEST;
use crate::joint::population::{Bounds, PopulationPlan, Variation};
use crate::joint::population_keys::{VariationKeys, VariationText};
use crate::joint::tree::NodeId;
use crate::joint::written::{At, TextOr, Written};
use crate::quantity::{self, Kind, Number, QuantityError};

/// What a text of a variation measures.
#[derive(Clone, Copy)]
struct Due {
    kind: Kind,
    /// Whether it is a matter of micrometres.
    small: bool,
}

impl Due {
    /// The fault with the unit that is likely meant.
    fn told(self, error: QuantityError) -> QuantityError {
        if self.small { error.suggesting("um") } else { error }
    }

    /// Whether a seat cannot be so: small lengths are roughnesses and standard deviations.
    fn too_great(self, value: f64) -> bool {
        self.small && value > ROUGHEST
    }
}

/// What is wrong with a roughness or a standard deviation of half a millimetre.
const TOO_GREAT: &str = "is above 0.5 mm, which no machined seat has; is um meant?";

type Given = At<TextOr<VariationText, VariationKeys>>;

/// The population; empty when the file is silent.
pub(super) fn population(draft: &Draft<'_>, file: &JointFile) -> PopulationPlan {
    let Some(At { value: keys, .. }) = &file.population else { return PopulationPlan::default() };
    let of = |given: &Option<Given>, kind: Kind, has_limits: bool| {
        given.as_ref().and_then(|given| variation(draft, given, Due { kind, small: false }, has_limits))
    };
    let roughness = |given: &Option<Given>| {
        let due = Due { kind: Kind::Length, small: true };
        given.as_ref().and_then(|given| variation(draft, given, due, false))
    };
    PopulationPlan {
        hole: of(&keys.hole, Kind::Length, true),
        shaft: of(&keys.shaft, Kind::Length, true),
        hub_roughness: roughness(&keys.hub_roughness),
        shaft_roughness: roughness(&keys.shaft_roughness),
        friction: of(&keys.friction, Kind::Number, false),
        pressing_friction: of(&keys.pressing_friction, Kind::Number, false),
        hub_youngs_modulus: of(&keys.hub_youngs_modulus, Kind::Pressure, false),
        shaft_youngs_modulus: of(&keys.shaft_youngs_modulus, Kind::Pressure, false),
        hub_temperature: of(&keys.hub_temperature, Kind::TemperatureDifference, false),
        shaft_temperature: of(&keys.shaft_temperature, Kind::TemperatureDifference, false),
    }
}

fn variation(draft: &Draft<'_>, given: &Given, due: Due, has_limits: bool) -> Option<Variation> {
    match &given.value {
        TextOr::Text(text) => of_text(draft, &At { node: given.node, value: text.clone() }, due, has_limits),
        TextOr::Keys(keys) => of_keys(draft, given.node, keys, due, has_limits),
    }
}

fn of_text(
    draft: &Draft<'_>,
    written: &Written<VariationText>,
    due: Due,
    has_limits: bool,
) -> Option<Variation> {
    let text = draft.value(written)?;
    match text.to_lowercase().as_str() {
        "uniform" if has_limits => return Some(Variation::Uniform(Bounds::Limits)),
        "normal" if has_limits => {
            return Some(Variation::Capable { cp: 1.0, cpk: 1.0, toward_upper: None, cut: false });
        }
        _ => {}
    }
    if text.contains(" to ") {
        return Some(Variation::Uniform(bounds(draft, written, due, has_limits)?));
    }
    Some(Variation::Fixed(value(draft, written, due)?))
}

fn of_keys(
    draft: &Draft<'_>,
    node: NodeId,
    keys: &VariationKeys,
    due: Due,
    has_limits: bool,
) -> Option<Variation> {
    let kinds = [keys.sd.is_some(), keys.cp.is_some(), keys.uniform.is_some(), keys.measured.is_some()];
    if kinds.iter().filter(|given| **given).count() != 1 {
        let fault = Fault::value(node, "a distribution is given by one of `sd`, `cp`, `uniform`, `measured`");
        draft.faults.add(
            fault.help("write `{sd: 4 um}`, `{cp: 1.33}`, `{uniform: limits}` or `{measured: parts.csv}`"),
        );
        return None;
    }
    if let Some(uniform) = &keys.uniform {
        return Some(Variation::Uniform(bounds(draft, uniform, due, has_limits)?));
    }
    if let Some(measured) = &keys.measured {
        return Some(Variation::Measured(draft.value(measured)?));
    }
    let cut = match &keys.truncated {
        Some(written) => Some(bounds(draft, written, due, has_limits)?),
        None => None,
    };
    if let Some(cp) = &keys.cp {
        return capable(draft, node, keys, cp, cut, has_limits);
    }
    let mean = match &keys.mean {
        Some(written) => Some(value(draft, written, due)?),
        None => None,
    };
    let sd = keys.sd.as_ref()?;
    let deviation = value(draft, sd, Due { small: due.kind == Kind::Length, ..due })?;
    if deviation <= 0.0 {
        draft.refuse(sd, "must be more than zero");
        return None;
    }
    let skewness = match &keys.skewness {
        Some(written) => {
            let skewness = draft.value(written)?;
            if skewness.abs() > 0.95 || cut.is_some() {
                draft.refuse(
                    written,
                    "must lie between -0.95 and 0.95, and a skewed distribution is not truncated",
                );
                return None;
            }
            Some(skewness)
        }
        None => None,
    };
    Some(Variation::Normal { mean, sd: deviation, cut, skewness })
}

fn capable(
    draft: &Draft<'_>,
    node: NodeId,
    keys: &VariationKeys,
    cp: &Written<Number>,
    cut: Option<Bounds>,
    has_limits: bool,
) -> Option<Variation> {
    if !has_limits {
        let fault = Fault::value(node, "`cp` needs limits, which only hole and shaft have");
        draft.faults.add(fault.help("give `mean` and `sd`"));
        return None;
    }
    if keys.mean.is_some() || keys.skewness.is_some() || matches!(cut, Some(Bounds::Given { .. })) {
        let fault = Fault::value(node, "`cp` stands with `cpk`, `toward` and `truncated: limits` only");
        draft.faults.add(fault.help("give `mean` and `sd` for any other normal"));
        return None;
    }
    let capability = draft.value(cp)?;
    if capability <= 0.0 {
        draft.refuse(cp, "must be more than zero");
        return None;
    }
    let cpk = match &keys.cpk {
        Some(written) => {
            let cpk = draft.value(written)?;
            if cpk > capability {
                draft.refuse(written, "is above cp: a mean off the middle only lowers it");
                return None;
            }
            cpk
        }
        None => capability,
    };
    let toward_upper = match &keys.toward {
        Some(word) => Some(draft.value(word)?),
        None => None,
    };
    Some(Variation::Capable { cp: capability, cpk, toward_upper, cut: cut.is_some() })
}

fn value(draft: &Draft<'_>, written: &Written<VariationText>, due: Due) -> Option<f64> {
    let text = draft.value(written)?;
    match quantity::parse(due.kind, &text).map_err(|error| due.told(error)) {
        Ok(value) if due.too_great(value) => {
            draft.refuse(written, TOO_GREAT);
            None
        }
        Ok(value) => Some(value),
        Err(error) => {
            draft.faults.add(Fault::value(written.node, error.to_string()).maybe_help(error.help()));
            None
        }
    }
}

fn bounds(draft: &Draft<'_>, written: &Written<VariationText>, due: Due, has_limits: bool) -> Option<Bounds> {
    let text = draft.value(written)?;
    if has_limits && text.eq_ignore_ascii_case("limits") {
        return Some(Bounds::Limits);
    }
    match quantity::parse_range(due.kind, &text).map_err(|error| due.told(error)) {
        Ok((_, high)) if due.too_great(high) => {
            draft.refuse(written, TOO_GREAT);
            None
        }
        Ok((low, high)) if low < high => Some(Bounds::Given { low, high }),
        Ok(_) => {
            draft.refuse(written, "is one value: write a range such as `a to b`");
            None
        }
        Err(error) => {
            draft.faults.add(Fault::value(written.node, error.to_string()).maybe_help(error.help()));
            None
        }
    }
}
