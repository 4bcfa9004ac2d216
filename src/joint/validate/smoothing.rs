//! The loss of interference as the peaks of the roughness flatten.

use crate::diagnostic::did_you_mean;
use crate::joint::diagnose::Fault;
use crate::joint::draft::Draft;
use crate::joint::file::{JointFile, SmoothingKeys};
use crate::joint::leaf::SmoothingText;
use crate::joint::written::{At, Text, TextOr, Written};
use crate::joint::{Method, Ring, Smoothing, SmoothingAt};
use crate::material::friction::FrictionMethod;
use crate::material::roughness::SmoothingRule;
use crate::quantity::{Kind, Number, written};

/// The rule when the file is silent: on the safe side for holding.
const RULE: SmoothingRule = SmoothingRule::Din7190Of2001;

const AT_SOURCE: &str = "lost for holding, kept for stress: each the safe side (common practice, no source)";

/// Share of (Rz shaft + Rz hub) with the rule it comes from.
struct Share {
    factor: f64,
    rule: String,
}

/// The loss of each fit.
pub(super) fn smoothing(
    draft: &mut Draft<'_>,
    file: &JointFile,
    rings: Option<&[Ring]>,
    method: Option<Method>,
) -> Option<Smoothing> {
    let method = method.map(friction_method);
    let (share, at) = match &file.smoothing {
        None => (default_share(draft, method), default_at(draft)),
        Some(At { node, value: TextOr::Text(text) }) => {
            let text = At { node: *node, value: text.clone() };
            if text.value.text.trim().eq_ignore_ascii_case("none") {
                (default_share(draft, method), Some(SmoothingAt::None))
            } else {
                (named_or_number(draft, &text, method), default_at(draft))
            }
        }
        Some(At { value: TextOr::Keys(keys), .. }) => of_keys(draft, keys, method),
    };
    let Share { factor, rule } = share?;
    let neighbours = rings?.windows(2);
    let loss = neighbours.map(|pair| factor * (pair[0].roughness.value + pair[1].roughness.value));
    Some(Smoothing { loss: loss.collect(), factor: Some(factor), rule, at: at? })
}

/// How a method joins, as far as friction and smoothing are concerned.
pub(super) fn friction_method(method: Method) -> FrictionMethod {
    match method {
        Method::Press => FrictionMethod::Pressed,
        Method::HeatHub | Method::ChillShaft | Method::HeatAndChill => FrictionMethod::Shrunk,
    }
}

fn of_keys(
    draft: &mut Draft<'_>,
    keys: &SmoothingKeys,
    method: Option<FrictionMethod>,
) -> (Option<Share>, Option<SmoothingAt>) {
    let share = match (&keys.factor, &keys.rule) {
        (Some(_), Some(rule)) => {
            let fault = Fault::key(rule.node, "`factor` and `rule` are both given");
            draft.faults.add(fault.help("keep the one that shall count"));
            None
        }
        (Some(factor), None) => given(draft, factor),
        (None, Some(rule)) => named_or_number(draft, rule, method),
        (None, None) => default_share(draft, method),
    };
    let at = match &keys.at {
        Some(at) => draft.value(at),
        None => default_at(draft),
    };
    (share, at)
}

fn default_at(draft: &mut Draft<'_>) -> Option<SmoothingAt> {
    draft.default("smoothing.at", "loosest", AT_SOURCE);
    Some(SmoothingAt::Loosest)
}

fn default_share(draft: &mut Draft<'_>, method: Option<FrictionMethod>) -> Option<Share> {
    let factor = RULE.factor(method?);
    draft.default("smoothing.factor", written(Kind::Number, factor), RULE.source());
    Some(published(RULE, factor))
}

fn published(rule: SmoothingRule, factor: f64) -> Share {
    Share { factor, rule: format!("{}: {} ({})", rule.name(), rule.formula(), rule.source()) }
}

fn named_or_number(
    draft: &Draft<'_>,
    text: &Written<SmoothingText>,
    method: Option<FrictionMethod>,
) -> Option<Share> {
    let name = draft.value(text)?;
    if let Some(rule) = SmoothingRule::named(&name) {
        return Some(published(rule, rule.factor(method?)));
    }
    if name.starts_with(|c: char| c.is_ascii_digit() || matches!(c, '.' | '+' | '-')) {
        return given(draft, &At { node: text.node, value: Text::new(name) });
    }
    let names = || SmoothingRule::ALL.into_iter().map(SmoothingRule::name);
    let help = match did_you_mean(&name, names()) {
        Some(near) => format!("did you mean `{near}`?"),
        None => format!("the rules are {}; or give `factor`", names().collect::<Vec<_>>().join(", ")),
    };
    draft.faults.add(Fault::value(text.node, format!("no rule for smoothing is called `{name}`")).help(help));
    None
}

fn given(draft: &Draft<'_>, factor: &Written<Number>) -> Option<Share> {
    let share = draft.not_negative(factor)?;
    if share > 2.0 {
        draft.refuse(factor, "is too large for a share of the roughness: published rules take 0 to 1.2");
        return None;
    }
    let rule = format!("{} (Rz shaft + Rz hub) (joint file)", written(Kind::Number, share));
    Some(Share { factor: share, rule })
}
