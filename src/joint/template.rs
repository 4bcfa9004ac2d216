//! Commented joint files to start from.

use crate::diagnostic::{Diagnostic, did_you_mean};

/// A joint file to start from.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Template {
    /// The word it is asked for by.
    pub kind: &'static str,
    /// What it is for.
    pub subject: &'static str,
    /// The file.
    pub text: &'static str,
}

/// Every template; the first is the one for no word.
pub const TEMPLATES: [Template; 12] = [
    Template {
        kind: "hub",
        subject: "a hub pressed onto a shaft, metric",
        text: include_str!("template/hub.yaml"),
    },
    Template {
        kind: "inch",
        subject: "a hub pressed onto a shaft, inch",
        text: include_str!("template/inch.yaml"),
    },
    Template {
        kind: "bush",
        subject: "a bush pressed into a housing",
        text: include_str!("template/bush.yaml"),
    },
    Template {
        kind: "shrink",
        subject: "a rim heated onto a wheel centre",
        text: include_str!("template/shrink.yaml"),
    },
    Template {
        kind: "chill",
        subject: "a seat ring chilled and put into a warmed head",
        text: include_str!("template/chill.yaml"),
    },
    Template {
        kind: "rings",
        subject: "three rings shrunk onto each other, with pressure inside",
        text: include_str!("template/rings.yaml"),
    },
    Template {
        kind: "stepped",
        subject: "a stepped hub at speed, hot and bent",
        text: include_str!("template/stepped.yaml"),
    },
    Template {
        kind: "plastic",
        subject: "a hub that yields by design",
        text: include_str!("template/plastic.yaml"),
    },
    Template {
        kind: "oven",
        subject: "a hub heated in an oven, with the time to seat it",
        text: include_str!("template/oven.yaml"),
    },
    Template {
        kind: "cold",
        subject: "a bush chilled in liquid nitrogen, with the room's oxygen",
        text: include_str!("template/cold.yaml"),
    },
    Template {
        kind: "measured",
        subject: "two measured parts",
        text: include_str!("template/measured.yaml"),
    },
    Template {
        kind: "bearing",
        subject: "a bearing on a shaft, or in a housing",
        text: include_str!("template/bearing.yaml"),
    },
];

/// The template of a kind; the first one when none is given.
///
/// # Errors
/// There is no such kind.
///
/// # Example
/// ```
/// use hubgrip::joint::template;
/// assert!(template::find(Some("bush")).unwrap().text.contains("joint_file: 1"));
/// assert_eq!(template::find(Some("bsuh")).unwrap_err().help.unwrap(), "did you mean `bush`?");
/// ```
pub fn find(kind: Option<&str>) -> Result<&'static Template, Box<Diagnostic>> {
    let kind = kind.unwrap_or(TEMPLATES[0].kind);
    if let Some(found) = TEMPLATES.iter().find(|template| template.kind == kind) {
        return Ok(found);
    }
    let kinds = TEMPLATES.iter().map(|template| template.kind);
    let fault = Diagnostic::new(format!("there is no joint file of kind `{kind}` to start from"));
    Err(Box::new(match did_you_mean(kind, kinds.clone()) {
        Some(near) => fault.with_help(format!("did you mean `{near}`?")),
        None => fault.with_help(format!("the kinds are {}", kinds.collect::<Vec<_>>().join(", "))),
    }))
}
