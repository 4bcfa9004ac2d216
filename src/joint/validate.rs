//! The joint put together from what the file says: what must be there, what must hold, what is taken when the
//! file is silent.

mod assembly;
mod bearing;
mod duty;
mod fit;
mod friction;
mod parts;
mod population;
mod practice;
mod rings;
mod smoothing;
mod steps;

pub(crate) use fit::COARSEST;

use super::diagnose::Fault;
use super::draft::Draft;
use super::file::{JointFile, RequireKeys, RingKeys};
use super::leaf::{CriterionWord, DisplayWord};
use super::read::FitKey;
use super::written::{At, Written};
use super::{Allow, BearingSeat, Fit, Joint, Requirements, Ring};
use crate::material::Kind as MaterialKind;
use crate::mechanics::criteria::DuctileCriterion;
use crate::mechanics::plastic::YieldRule;
use crate::quantity::{Kind, Number, UnitSystem, written};

/// The keys in the order of the joint file, which is the order of the defaults.
const ORDER: [&str; 16] = [
    "diameter",
    "length",
    "relief",
    "rings",
    "order",
    "shaft",
    "hub",
    "fit",
    "friction",
    "duty",
    "assembly",
    "smoothing",
    "criterion",
    "require",
    "display",
    "joint_file",
];

/// Slip safety asked for when the file is silent.
const SLIP_SAFETY: (f64, &str) = (
    1.5,
    "usual against slip under steady load, 1.2 at least and 1.8 to 2.2 for alternating load (textbooks after DIN 7190, from memory)",
);

/// Yield safety asked for when the file is silent.
const YIELD_SAFETY: (f64, &str) =
    (1.2, "within 1.0 to 1.3, usual for ductile parts (textbooks after DIN 7190, from memory)");

/// Fracture safety asked for when the file is silent.
const FRACTURE_SAFETY: (f64, &str) = (
    2.5,
    "within 2 to 3 on tensile strength, usual for brittle parts (textbooks after DIN 7190, from memory)",
);

/// The joint, unless something is wrong.
pub(crate) fn joint(draft: &mut Draft<'_>, file: &JointFile, fit_key: FitKey) -> Option<Joint> {
    // Without its sizes nothing can be said of the rest: only the bearing's own faults are told.
    let seat = bearing::seat(draft, file)?;
    let (length, relief) = lengths(draft, file, seat.as_ref());
    let method = assembly::method(draft, file);
    let shop = assembly::shop_temperature(draft, file);
    let Body { diameter, rings, fits, order } = match &file.rings {
        Some(list) => many_rings(draft, file, list),
        None => two_parts(draft, file, fit_key, seat.as_ref()),
    };
    let slices =
        if file.rings.is_some() { Some(Vec::new()) } else { steps::slices(draft, file, diameter, length) };
    let friction = friction::friction(draft, file, rings.as_deref(), method);
    let duty = duty::states(draft, file, rings.as_deref(), shop);
    let mut assembly = assembly::plan(draft, file, rings.as_deref(), diameter, method, shop);
    if let (Some(plan), Some(seat), Some(rings)) = (&mut assembly, &seat, &rings) {
        bearing::keep_cool(plan, seat, rings);
    }
    if let Some(plan) = &assembly {
        let seat = length.zip(relief).map(|(length, relief)| length - relief);
        practice::refuse_impossible(draft, file, &plan.practice, seat);
    }
    let smoothing = smoothing::smoothing(draft, file, rings.as_deref(), method);
    let criterion = criterion(draft, file);
    let require = requirements(draft, file.require.as_ref());
    refuse_brittle_yield(draft, file, rings.as_deref(), require.as_ref());
    let population = population::population(draft, file);
    let display = display(draft, file);
    if !draft.faults.is_empty() {
        return None;
    }
    let mut defaults = std::mem::take(&mut draft.defaults);
    defaults.sort_by_key(|default| rank(&default.key));
    Some(Joint {
        title: draft.optional(file.title.as_ref()).unwrap_or_default(),
        drawing: draft.optional(file.drawing.as_ref()),
        note: draft.optional(file.note.as_ref()),
        date: draft.optional(file.date.as_ref()),
        diameter: diameter?,
        length: length?,
        relief: relief?,
        rings: rings?,
        fits: fits?,
        bearing: seat,
        order: order?,
        slices: slices?,
        friction: friction?,
        duty: duty?,
        assembly: assembly?,
        smoothing: smoothing?,
        criterion: criterion?,
        require: require?,
        population,
        display: display?,
        defaults,
        remarks: std::mem::take(&mut draft.remarks),
        set: Vec::new(),
        digest: String::new(),
    })
}

/// What the joint consists of.
struct Body {
    diameter: Option<f64>,
    rings: Option<Vec<Ring>>,
    fits: Option<Vec<Fit>>,
    order: Option<Vec<usize>>,
}

fn two_parts(draft: &mut Draft<'_>, file: &JointFile, fit_key: FitKey, seat: Option<&BearingSeat>) -> Body {
    for (key, node) in
        [("fits", file.fits.as_ref().map(|at| at.node)), ("order", file.order.as_ref().map(|at| at.node))]
    {
        if let Some(node) = node {
            let fault = Fault::key(node, format!("`{key}` goes with `rings`"));
            draft.faults.add(fault.help("two parts have `shaft`, `hub` and one `fit`"));
        }
    }
    let root = draft.tree.root();
    let diameter = match seat {
        Some(seat) => bearing::diameter(draft, file, seat),
        None => draft
            .required(root, "diameter", "60 mm", file.diameter.as_ref())
            .and_then(|written| draft.positive(written)),
    };
    let rings = parts::rings(draft, file, diameter, seat);
    let fits = if fit_key == FitKey::Optional && file.fit.is_none() {
        Some(Vec::new())
    } else {
        fit::fit(draft, file, diameter, seat).map(|fit| vec![fit])
    };
    Body { diameter, rings, fits, order: Some(vec![0]) }
}

fn many_rings(draft: &mut Draft<'_>, file: &JointFile, list: &At<Vec<At<RingKeys>>>) -> Body {
    rings::refuse_two_parts(draft, file);
    let rings = rings::rings(draft, list);
    let fits = rings::fits(draft, file, rings.as_deref());
    let order = rings::order(draft, file, list.value.len().saturating_sub(1));
    let diameter = rings.as_ref().and_then(|rings| rings.first()).map(|ring| ring.outer_diameter);
    Body { diameter, rings, fits, order }
}

fn rank(key: &str) -> usize {
    let section = key.split('.').next().unwrap_or(key);
    ORDER.iter().position(|known| *known == section).unwrap_or(ORDER.len())
}

fn lengths(
    draft: &mut Draft<'_>,
    file: &JointFile,
    seat: Option<&BearingSeat>,
) -> (Option<f64>, Option<f64>) {
    let length = match (seat, &file.length) {
        (Some(seat), None) => {
            draft.default("length", self::written(Kind::Length, seat.width), "the width of the bearing");
            Some(seat.width)
        }
        (seat, given) => draft
            .required(draft.tree.root(), "length", "70 mm", given.as_ref())
            .and_then(|written| bearing::within_width(draft, written, seat)),
    };
    let Some(written) = &file.relief else {
        draft.default("relief", "0 mm", "the whole length is taken to carry");
        return (length, Some(0.0));
    };
    let relief = draft.zero_or_positive(written);
    if let (Some(length_value), Some(relief_value)) = (length, relief)
        && relief_value >= length_value
    {
        let whole = match &file.length {
            Some(given) => draft.called(given),
            None => format!("width {} of the bearing", self::written(Kind::Length, length_value)),
        };
        draft.refuse(written, &format!("leaves nothing of the {whole}"));
        return (length, None);
    }
    (length, relief)
}

fn criterion(draft: &mut Draft<'_>, file: &JointFile) -> Option<DuctileCriterion> {
    let Some(written) = &file.criterion else {
        let source = "greatest distortion energy, the usual criterion for ductile metals (textbooks of strength of materials)";
        draft.default("criterion", "von Mises", source);
        return Some(DuctileCriterion::VonMises);
    };
    draft.value::<CriterionWord>(written)
}

fn display(draft: &mut Draft<'_>, file: &JointFile) -> Option<UnitSystem> {
    let Some(written) = &file.display else {
        draft.default(
            "display",
            "metric",
            "metric unless the file says inch, whatever units it is written in",
        );
        return Some(UnitSystem::Metric);
    };
    draft.value::<DisplayWord>(written)
}

fn requirements(draft: &mut Draft<'_>, keys: Option<&At<RequireKeys>>) -> Option<Requirements> {
    let keys = keys.map(|at| &at.value);
    let mut safety = |key: &str, written: Option<&Written<Number>>, (value, source): (f64, &str)| {
        let Some(given) = written else {
            draft.default(format!("require.{key}"), self::written(Kind::Number, value), source);
            return Some(value);
        };
        let value = draft.value(given)?;
        if value > 0.0 {
            return Some(value);
        }
        draft.refuse(given, "must be more than zero");
        None
    };
    let slip = safety("slip_safety", keys.and_then(|k| k.slip_safety.as_ref()), SLIP_SAFETY);
    let yielding = safety("yield_safety", keys.and_then(|k| k.yield_safety.as_ref()), YIELD_SAFETY);
    let fracture = safety("fracture_safety", keys.and_then(|k| k.fracture_safety.as_ref()), FRACTURE_SAFETY);
    let press_force = match keys.and_then(|k| k.press_force.as_ref()) {
        None => None,
        Some(given) => {
            let force = draft.value(given)?;
            if force <= 0.0 {
                draft.refuse(given, "must be more than zero");
                return None;
            }
            Some(force)
        }
    };
    let (allow, yield_rule) = yielding_by_design(draft, keys)?;
    Some(Requirements {
        slip_safety: slip?,
        yield_safety: yielding?,
        fracture_safety: fracture?,
        press_force,
        allow,
        yield_rule,
    })
}

/// Refuses a hub that may yield by design and does not yield.
fn refuse_brittle_yield(
    draft: &Draft<'_>,
    file: &JointFile,
    rings: Option<&[Ring]>,
    require: Option<&Requirements>,
) {
    let allow = file.require.as_ref().and_then(|keys| keys.value.allow.as_ref());
    let hub = rings.and_then(<[Ring]>::last).filter(|hub| hub.material.kind != MaterialKind::Ductile);
    if let (Some(given), Some(hub), Some(Requirements { allow: Allow::Plastic { .. }, .. })) =
        (allow, hub, require)
    {
        let what = format!("is for a ductile hub, and the {} is of {}", hub.name, hub.material.name);
        draft.refuse(given, &what);
    }
}

/// Share of the hub's section that may be plastic when the file is silent.
const PLASTIC_SHARE: (f64, &str) = (0.3, "usual limit of elastic-plastic design (DIN 7190, from memory)");

/// Whether the hub may yield by design, over how much of its section, and by which rule.
fn yielding_by_design(draft: &mut Draft<'_>, keys: Option<&RequireKeys>) -> Option<(Allow, YieldRule)> {
    let plastic = match keys.and_then(|keys| keys.allow.as_ref()) {
        None => {
            draft.default("require.allow", "elastic", "no part yields by design");
            false
        }
        Some(given) => draft.value(given)?,
    };
    let rule = match keys.and_then(|keys| keys.yield_rule.as_ref()) {
        None => YieldRule::default(),
        Some(given) => draft.value(given)?,
    };
    let given = keys.and_then(|keys| keys.plastic_share.as_ref());
    if !plastic {
        if let Some(given) = given {
            draft.refuse(given, "needs `allow: plastic`");
        }
        return Some((Allow::Elastic, rule));
    }
    let share = match given {
        None => {
            draft.default("require.plastic_share", written(Kind::Number, PLASTIC_SHARE.0), PLASTIC_SHARE.1);
            PLASTIC_SHARE.0
        }
        Some(given) => {
            let share = draft.value(given)?;
            if !(share > 0.0 && share <= 1.0) {
                draft.refuse(given, "must be more than 0 and at most 1");
                return None;
            }
            share
        }
    };
    if keys.is_some_and(|keys| keys.yield_rule.is_none()) {
        draft.default("require.yield_rule", "Tresca", "the safe side for strength and for holding");
    }
    Some((Allow::Plastic { share }, rule))
}
