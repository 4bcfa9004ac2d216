//! Expansion curves that several materials share, built into the program.
//!
//! A record names one, `expansion: ferritic steel`, instead of repeating its points. The files stand in
//! `materials/expansion`, each with its sources and with what was joined in it.

use std::sync::Arc;

use serde::Deserialize;

use super::Expansion;
use super::record::{ExpansionRecord, MaterialError};
use crate::diagnostic::did_you_mean;

/// Name and text of every shared curve.
const CURVES: [(&str, &str); 7] = [
    ("austenitic steel", include_str!("../../materials/expansion/austenitic-steel.yaml")),
    ("brass", include_str!("../../materials/expansion/brass.yaml")),
    ("copper", include_str!("../../materials/expansion/copper.yaml")),
    ("ferritic steel", include_str!("../../materials/expansion/ferritic-steel.yaml")),
    ("grey iron", include_str!("../../materials/expansion/grey-iron.yaml")),
    ("spheroidal iron", include_str!("../../materials/expansion/spheroidal-iron.yaml")),
    ("wrought aluminium", include_str!("../../materials/expansion/wrought-aluminium.yaml")),
];

#[derive(Deserialize)]
#[serde(deny_unknown_fields)]
struct CurveFile {
    name: String,
    expansion: ExpansionRecord,
}

/// The names of the shared curves, in alphabetical order.
pub fn names() -> impl Iterator<Item = &'static str> {
    CURVES.iter().map(|&(name, _)| name)
}

/// The shared curve called `name`.
///
/// # Errors
/// No such curve; the error lists them and proposes the nearest.
///
/// # Example
/// Ferritic steel from 20 °C to the boiling point of nitrogen (77.36 K) shrinks by 1.95 per mille.
/// ```
/// let steel = hubgrip::material::curves::named("ferritic steel").unwrap();
/// assert!((steel.strain(77.36).unwrap() + 1.95e-3).abs() < 0.005e-3);
/// ```
pub fn named(name: &str) -> Result<Expansion, MaterialError> {
    let found = CURVES.iter().find(|(known, _)| known.eq_ignore_ascii_case(name.trim()));
    let Some(&(_, text)) = found else { return Err(unknown(name)) };
    let file: CurveFile =
        serde_yaml::from_str(text).map_err(|error| MaterialError::new(error.to_string()))?;
    file.expansion.into_expansion(&Arc::from(file.name.as_str()))
}

fn unknown(name: &str) -> MaterialError {
    let help = did_you_mean(name, names()).map_or_else(
        || format!("a coefficient such as `11.5e-6 /K`, or one of {}", list()),
        |near| format!("did you mean `{near}`?"),
    );
    MaterialError::new(format!("no expansion curve is called `{name}`")).with_help(help)
}

fn list() -> String {
    names().map(|name| format!("`{name}`")).collect::<Vec<_>>().join(", ")
}
