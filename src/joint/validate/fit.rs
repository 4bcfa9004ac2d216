//! The fit: a callout, limits, or two measured parts.

use crate::assembly::bearing_tables::BearingRing;
use crate::joint::diagnose::Fault;
use crate::joint::draft::Draft;
use crate::joint::file::{FitKeys, JointFile, LimitKeys, MeasuredKeys};
use crate::joint::leaf::{FitText, LimitsText};
use crate::joint::tree::NodeId;
use crate::joint::written::{At, Refused, TextOr, Written};
use crate::joint::{BearingSeat, Fit};
use crate::quantity::{self, Kind, Length, QuantityError, UnitSystem};
use crate::tolerance::{FitCallout, Limits, Member, MemberCallout, Resolved, ToleranceError};

const EXAMPLE: &str = "H7/s6";

/// Share of the diameter from which on an uncertainty is refused: it would cover any fit (common practice, no source).
pub(crate) const COARSEST: f64 = 0.005;

/// The fit of two parts with its limits.
pub(super) fn fit(
    draft: &mut Draft<'_>,
    file: &JointFile,
    diameter: Option<f64>,
    seat: Option<&BearingSeat>,
) -> Option<Fit> {
    let example = match seat.map(|seat| seat.ring) {
        None => EXAMPLE,
        Some(BearingRing::Inner) => "k6",
        Some(BearingRing::Outer) => "N7",
    };
    let given = draft.required(draft.tree.root(), "fit", example, file.fit.as_ref())?;
    one(draft, given, diameter, units_of(file.diameter.as_ref()), seat)
}

/// A fit at a nominal diameter that was written in these units.
pub(super) fn one(
    draft: &mut Draft<'_>,
    given: &At<TextOr<FitText, FitKeys>>,
    diameter: Option<f64>,
    units: UnitSystem,
    seat: Option<&BearingSeat>,
) -> Option<Fit> {
    let (callout, written) = match &given.value {
        TextOr::Text(text) => {
            let written: Written<FitText> = At { node: given.node, value: text.clone() };
            let text = draft.value(&written)?;
            match seat {
                Some(seat) => (with_ring(draft, given.node, &text, seat)?, text),
                None => (of_text(draft, given.node, &text)?, text),
            }
        }
        TextOr::Keys(keys) => {
            let callout = of_keys(draft, given.node, keys, seat)?;
            let written = callout.to_string();
            (callout, written)
        }
    };
    let nominal = diameter?;
    let resolved = match callout.resolve_given_in(nominal, units) {
        Ok(resolved) => resolved,
        Err(error) => return refused(draft, culprit(given, &error), &error),
    };
    let resolved = from_tables(resolved, &callout, seat);
    draft.remarks.extend(resolved.remarks);
    let source = if resolved.hole_source == resolved.shaft_source {
        resolved.hole_source
    } else {
        format!("hole: {}; shaft: {}", resolved.hole_source, resolved.shaft_source)
    };
    Some(Fit { callout: written, limits: resolved.limits, source })
}

fn refused<T>(draft: &Draft<'_>, node: NodeId, error: &ToleranceError) -> Option<T> {
    draft.faults.add(Fault::value(node, error.to_string()).maybe_help(error.help()));
    None
}

/// The member that an error is about, else the whole fit.
fn culprit(given: &At<TextOr<FitText, FitKeys>>, error: &ToleranceError) -> NodeId {
    let TextOr::Keys(keys) = &given.value else { return given.node };
    let member = match error {
        ToleranceError::DeviationsReversed { member, .. }
        | ToleranceError::SizesReversed { member, .. }
        | ToleranceError::ImplausibleDeviation { member, .. }
        | ToleranceError::WrongMember { member, .. } => *member,
        ToleranceError::NotDefined { class, .. } | ToleranceError::NotUsed { class, .. } => {
            if class.starts_with(|c: char| c.is_ascii_uppercase()) { Member::Hole } else { Member::Shaft }
        }
        _ => return given.node,
    };
    if let Some(measured) = &keys.measured {
        let part = match member {
            Member::Hole => measured.value.hole.as_ref(),
            Member::Shaft => measured.value.shaft.as_ref(),
        };
        return part.map_or(given.node, |part| part.node);
    }
    let part = match member {
        Member::Hole => keys.hole.as_ref(),
        Member::Shaft => keys.shaft.as_ref(),
    };
    part.map_or(given.node, |part| part.node)
}

/// Unit system in which a length was written.
pub(super) fn units_of(given: Option<&Written<Length>>) -> UnitSystem {
    let inch = given.is_some_and(|given| {
        let text = given.value.text.trim_end();
        ["in", "inch", "\"", "thou", "mil", "ft"].iter().any(|unit| text.ends_with(unit))
    });
    if inch { UnitSystem::Inch } else { UnitSystem::Metric }
}

fn of_text(draft: &Draft<'_>, node: NodeId, text: &str) -> Option<FitCallout> {
    match FitCallout::parse(text) {
        Ok(callout) => Some(callout),
        Err(error) => refused(draft, node, &error),
    }
}

fn of_keys(
    draft: &Draft<'_>,
    node: NodeId,
    keys: &FitKeys,
    seat: Option<&BearingSeat>,
) -> Option<FitCallout> {
    if let Some(measured) = &keys.measured {
        for (key, other) in [("hole", &keys.hole), ("shaft", &keys.shaft)] {
            if let Some(other) = other {
                let fault = Fault::key(other.node, format!("`{key}` stands beside `measured`"));
                draft.faults.add(fault.help("give either the measured parts or the limits"));
            }
        }
        return of_measured(draft, measured);
    }
    let given = |which: Member| match which {
        Member::Hole => keys.hole.as_ref(),
        Member::Shaft => keys.shaft.as_ref(),
    };
    let of = |which: Member| match seat {
        Some(seat) if seat.member() == which && given(which).is_none() => {
            Some(MemberCallout::Deviations(seat.limits.value))
        }
        _ => member(draft, node, which, given(which)),
    };
    let (hole, shaft) = (of(Member::Hole), of(Member::Shaft));
    Some(FitCallout::members(hole?, shaft?))
}

/// The class of the other member alone, with the limits of the ring by ISO 492.
fn with_ring(draft: &Draft<'_>, node: NodeId, text: &str, seat: &BearingSeat) -> Option<FitCallout> {
    let other = seat.member().other();
    match of_member_text(text, other) {
        Ok(callout) => {
            let ring = MemberCallout::Deviations(seat.limits.value);
            Some(match other {
                Member::Shaft => FitCallout::members(ring, callout),
                Member::Hole => FitCallout::members(callout, ring),
            })
        }
        Err(fault) => {
            let help = if text.contains('/') || FitCallout::parse(text).is_ok() {
                let example = if other == Member::Shaft { "k6" } else { "N7" };
                Some(format!(
                    "the {} has its limits from ISO 492: write the class of the {other} alone, such as `fit: {example}`",
                    seat.ring_name()
                ))
            } else {
                fault.help
            };
            draft.faults.add(Fault::value(node, fault.message).maybe_help(help));
            None
        }
    }
}

/// The source of the ring's limits, when they are those of the table.
fn from_tables(mut resolved: Resolved, callout: &FitCallout, seat: Option<&BearingSeat>) -> Resolved {
    let (Some(seat), FitCallout::Members { hole, shaft }) = (seat, callout) else { return resolved };
    let own = MemberCallout::Deviations(seat.limits.value);
    match seat.member() {
        Member::Hole if *hole == own => resolved.hole_source = seat.limits.source.to_string(),
        Member::Shaft if *shaft == own => resolved.shaft_source = seat.limits.source.to_string(),
        _ => {}
    }
    resolved
}

fn of_measured(draft: &Draft<'_>, measured: &At<MeasuredKeys>) -> Option<FitCallout> {
    let keys = &measured.value;
    let hole = draft.required(measured.node, "hole", "60.012 mm", keys.hole.as_ref());
    let shaft = draft.required(measured.node, "shaft", "60.061 mm", keys.shaft.as_ref());
    let common = match &keys.uncertainty {
        Some(given) => Some(draft.not_negative(given)?),
        None => None,
    };
    let (hole, shaft) = (draft.value(hole?), draft.value(shaft?));
    let ((hole, own_hole), (shaft, own_shaft)) = (hole?, shaft?);
    let own = match (own_hole, own_shaft) {
        (Some(a), Some(b)) if a != b => {
            let fault = Fault::value(measured.node, "the two parts have different uncertainties");
            draft.faults.add(fault.help("give the limits: `{hole: {min, max}, shaft: {min, max}}`"));
            return None;
        }
        (a, b) => a.or(b),
    };
    if own.is_some() && common.is_some() {
        let fault = Fault::value(measured.node, "the uncertainty is given twice");
        draft.faults.add(fault.help("keep `uncertainty`, or the ± behind the sizes"));
        return None;
    }
    let Some(uncertainty) = own.or(common) else {
        draft.required::<()>(measured.node, "uncertainty", "2 um", None);
        return None;
    };
    if hole > 0.0 && uncertainty >= COARSEST * hole {
        let own = keys.hole.as_ref().filter(|_| own_hole.is_some()).or(keys.shaft.as_ref());
        let node =
            keys.uncertainty.as_ref().map_or(own.map_or(measured.node, |part| part.node), |at| at.node);
        let fault = format!(
            "the uncertainty {} is {:.2} % of the diameter {}: no measurement of a seat is so coarse",
            quantity::written(Kind::Length, uncertainty),
            100.0 * uncertainty / hole,
            quantity::written(Kind::Length, hole)
        );
        draft.faults.add(Fault::value(node, fault).help("is um meant, as in `uncertainty: 2 um`?"));
        return None;
    }
    Some(FitCallout::measured(hole, shaft, uncertainty))
}

fn member(
    draft: &Draft<'_>,
    fit: NodeId,
    member: Member,
    given: Option<&At<TextOr<LimitsText, LimitKeys>>>,
) -> Option<MemberCallout> {
    let (key, example) = match member {
        Member::Hole => ("hole", "H7"),
        Member::Shaft => ("shaft", "s6"),
    };
    let given = draft.required(fit, key, example, given)?;
    match &given.value {
        TextOr::Text(text) => {
            let written: Written<LimitsText> = At { node: given.node, value: text.clone() };
            let text = draft.value(&written)?;
            match of_member_text(&text, member) {
                Ok(callout) => Some(callout),
                Err(fault) => {
                    draft.faults.add(Fault::value(given.node, fault.message).maybe_help(fault.help));
                    None
                }
            }
        }
        TextOr::Keys(keys) => of_limits(draft, given.node, keys),
    }
}

fn of_member_text(text: &str, member: Member) -> Result<MemberCallout, Refused> {
    if text.starts_with(|c: char| c.is_ascii_digit() || matches!(c, '±' | '+' | '-' | '.')) {
        let (lower, upper) = quantity::parse_plus_minus(Kind::Length, text).map_err(|error| {
            let both = "write ±10 um, or both deviations: {lower: 53 um, upper: 72 um}".to_owned();
            let help =
                if matches!(error, QuantityError::NotPlusMinus { .. }) { Some(both) } else { error.help() };
            let error = error.suggesting("um");
            Refused { message: error.to_string(), help }
        })?;
        return Ok(MemberCallout::Deviations(Limits { lower, upper }));
    }
    MemberCallout::parse(text, member)
        .map_err(|error| Refused { message: error.to_string(), help: error.help() })
}

fn of_limits(draft: &Draft<'_>, node: NodeId, keys: &LimitKeys) -> Option<MemberCallout> {
    let deviations = keys.lower.is_some() || keys.upper.is_some();
    let sizes = keys.min.is_some() || keys.max.is_some();
    if deviations && sizes {
        let fault = Fault::value(node, "deviations and sizes are mixed");
        draft.faults.add(fault.help("give lower and upper (from the diameter), or min and max (sizes)"));
        return None;
    }
    if sizes {
        let minimum = draft.required(node, "min", "60.053 mm", keys.min.as_ref());
        let maximum = draft.required(node, "max", "60.072 mm", keys.max.as_ref());
        let (minimum, maximum) = (draft.positive(minimum?), draft.positive(maximum?));
        return Some(MemberCallout::Sizes { minimum: minimum?, maximum: maximum? });
    }
    let lower = draft.required(node, "lower", "0 um", keys.lower.as_ref());
    let upper = draft.required(node, "upper", "30 um", keys.upper.as_ref());
    let (lower, upper) = (draft.value(lower?), draft.value(upper?));
    Some(MemberCallout::Deviations(Limits { lower: lower?, upper: upper? }))
}
