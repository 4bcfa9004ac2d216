//! The coefficients of friction: from the file, else from the library by pair and method.

use super::smoothing::friction_method;
use crate::joint::draft::Draft;
use crate::joint::file::{FrictionKeys, JointFile};
use crate::joint::leaf::{FrictionText, LubricationWord};
use crate::joint::tree::NodeId;
use crate::joint::written::{At, Text, TextOr, Written, read_word};
use crate::joint::{Friction, Method, Ring};
use crate::material::friction::{FrictionSet, Lubrication, friction as from_library};
use crate::material::{Range, Sourced};
use crate::quantity::{Kind, NumberRange, written};

/// Coefficients outside this band are accepted with a remark.
const USUAL: (f64, f64) = (0.02, 0.4);

/// The coefficients of friction.
pub(super) fn friction(
    draft: &mut Draft<'_>,
    file: &JointFile,
    rings: Option<&[Ring]>,
    method: Option<Method>,
) -> Option<Friction> {
    match &file.friction {
        None => all_from_library(draft, rings, method, None),
        Some(At { value: TextOr::Keys(keys), .. }) => of_keys(draft, keys, rings, method),
        Some(At { node, value: TextOr::Text(text) }) => of_text(draft, *node, text, rings, method),
    }
}

fn of_text(
    draft: &mut Draft<'_>,
    node: NodeId,
    text: &Text<FrictionText>,
    rings: Option<&[Ring]>,
    method: Option<Method>,
) -> Option<Friction> {
    if let Ok(lubrication) = read_word::<LubricationWord>(&text.text) {
        return all_from_library(draft, rings, method, Some(lubrication));
    }
    if text.text.trim().starts_with(|c: char| c.is_alphabetic()) {
        draft.value::<LubricationWord>(&At { node, value: Text::new(text.text.clone()) });
        return None;
    }
    let range = range(draft, &At { node, value: Text::new(text.text.clone()) })?;
    Some(Friction { holding: range.clone(), pressing: range.clone(), release: range, lubrication: None })
}

fn of_keys(
    draft: &mut Draft<'_>,
    keys: &FrictionKeys,
    rings: Option<&[Ring]>,
    method: Option<Method>,
) -> Option<Friction> {
    let given = [&keys.holding, &keys.pressing, &keys.release];
    let lubrication = match &keys.lubrication {
        Some(word) => Some(draft.value(word)?),
        None => None,
    };
    let mut ranges = Vec::with_capacity(given.len());
    for written in given {
        ranges.push(match written {
            Some(written) => Some(range(draft, written)?),
            None => None,
        });
    }
    let silent = ranges.iter().any(Option::is_none);
    let found = if silent { Some(of_library(draft, rings?, method?, lubrication)?) } else { None };
    let mut ranges = ranges.into_iter();
    let mut next = |draft: &mut Draft<'_>, key: &str, of: fn(&FrictionSet) -> &Sourced<Range>| {
        ranges.next().flatten().or_else(|| found.as_ref().map(|set| noted(draft, key, of(set))))
    };
    Some(Friction {
        holding: next(draft, "holding", |set| &set.holding)?,
        pressing: next(draft, "pressing", |set| &set.pressing)?,
        release: next(draft, "release", |set| &set.release)?,
        lubrication: lubrication.or(found.as_ref().map(|set| set.lubrication)),
    })
}

fn all_from_library(
    draft: &mut Draft<'_>,
    rings: Option<&[Ring]>,
    method: Option<Method>,
    lubrication: Option<Lubrication>,
) -> Option<Friction> {
    let set = of_library(draft, rings?, method?, lubrication)?;
    Some(Friction {
        holding: noted(draft, "holding", &set.holding),
        pressing: noted(draft, "pressing", &set.pressing),
        release: noted(draft, "release", &set.release),
        lubrication: Some(set.lubrication),
    })
}

fn of_library(
    draft: &mut Draft<'_>,
    rings: &[Ring],
    method: Method,
    lubrication: Option<Lubrication>,
) -> Option<FrictionSet> {
    // Of several pairs the one that holds least counts, and for the press the one that drags most.
    let pairs = || {
        rings.windows(2).map(|pair| {
            let (inner, outer) = (&pair[0].material, &pair[1].material);
            (from_library(outer, inner, friction_method(method), lubrication), inner, outer)
        })
    };
    let least = |set: &FrictionSet| set.holding.value.low;
    let (mut set, inner, outer) = pairs().min_by(|a, b| least(&a.0).total_cmp(&least(&b.0)))?;
    for other in pairs().map(|(other, ..)| other) {
        for (own, other) in [(&mut set.pressing, other.pressing), (&mut set.release, other.release)] {
            if other.value.high > own.value.high {
                *own = other;
            }
        }
    }
    if lubrication.is_none() {
        let (word, source) = match set.lubrication {
            Lubrication::Oiled => {
                ("oiled", "usual for pressed seats, and the lower friction (common practice, no source)")
            }
            Lubrication::Dry => ("dry", "wiped clean, not degreased (common practice, no source)"),
            Lubrication::Degreased => ("degreased", "common practice, no source"),
        };
        draft.default("friction.lubrication", word, source);
    }
    if set.is_fallback {
        draft.remarks.push(format!(
            "The library has no coefficients of friction for {} on {}: a general band is used.",
            inner.id, outer.id
        ));
    }
    Some(set)
}

fn noted(draft: &mut Draft<'_>, key: &str, range: &Sourced<Range>) -> Sourced<Range> {
    draft.default(format!("friction.{key}"), range_text(range.value), range.source.to_string());
    range.clone()
}

fn range_text(range: Range) -> String {
    let number = |value| written(Kind::Number, value);
    if range.low == range.high {
        number(range.low)
    } else {
        format!("{} to {}", number(range.low), number(range.high))
    }
}

/// A coefficient from the file: more than 0, at most 1, the low end first.
fn range(draft: &mut Draft<'_>, given: &Written<NumberRange>) -> Option<Sourced<Range>> {
    let (low, high) = draft.value(given)?;
    if low > high {
        draft.refuse(given, "has its ends the wrong way round");
        return None;
    }
    if low <= 0.0 || high > 1.0 {
        draft.refuse(given, "is not a coefficient of friction: it must be more than 0 and at most 1");
        return None;
    }
    if low < USUAL.0 || high > USUAL.1 {
        draft.remarks.push(format!(
            "The coefficient of friction {} is outside {} to {}, where press and shrink fits lie.",
            draft.called(given),
            USUAL.0,
            USUAL.1
        ));
    }
    Some(Sourced::new(Range { low, high }, "joint file"))
}
