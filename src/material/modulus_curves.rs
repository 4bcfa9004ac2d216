//! Curves of Young's modulus that several materials share, built into the program.
//!
//! A record names one, `youngs_modulus_curve: carbon steel`, instead of repeating its points. The files stand in
//! `materials/modulus`, each with its sources and with what was joined in it. What is shared is the ratio to the modulus
//! at 20 °C, which each material has of its own.

use std::sync::Arc;

use serde::Deserialize;

use super::ModulusCurve;
use super::record::{MaterialError, ModulusRecord};
use crate::diagnostic::did_you_mean;

/// Name and text of every shared curve.
const CURVES: [(&str, &str); 8] = [
    ("aluminium", include_str!("../../materials/modulus/aluminium.yaml")),
    ("austenitic steel", include_str!("../../materials/modulus/austenitic-steel.yaml")),
    ("carbon steel", include_str!("../../materials/modulus/carbon-steel.yaml")),
    ("copper alloy", include_str!("../../materials/modulus/copper-alloy.yaml")),
    ("low-alloy steel", include_str!("../../materials/modulus/low-alloy-steel.yaml")),
    ("martensitic steel", include_str!("../../materials/modulus/martensitic-steel.yaml")),
    ("nickel alloy", include_str!("../../materials/modulus/nickel-alloy.yaml")),
    ("titanium", include_str!("../../materials/modulus/titanium.yaml")),
];

#[derive(Deserialize)]
#[serde(deny_unknown_fields)]
struct CurveFile {
    name: String,
    modulus: ModulusRecord,
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
/// Carbon steel at 200 °C has 95 % of its modulus at 20 °C.
/// ```
/// let steel = hubgrip::material::modulus_curves::named("carbon steel").unwrap();
/// assert!((steel.ratio(473.15).unwrap() - 0.95).abs() < 0.005);
/// ```
pub fn named(name: &str) -> Result<ModulusCurve, MaterialError> {
    let found = CURVES.iter().find(|(known, _)| known.eq_ignore_ascii_case(name.trim()));
    let Some(&(_, text)) = found else { return Err(unknown(name)) };
    let file: CurveFile =
        serde_yaml::from_str(text).map_err(|error| MaterialError::new(error.to_string()))?;
    file.modulus.into_curve(None, &Arc::from(file.name.as_str()))
}

fn unknown(name: &str) -> MaterialError {
    let help = did_you_mean(name, names()).map_or_else(
        || {
            let list = names().map(|name| format!("`{name}`")).collect::<Vec<_>>().join(", ");
            format!("a table such as `moduli: [[20 degC, 210 GPa], [200 degC, 199 GPa]]`, or one of {list}")
        },
        |near| format!("did you mean `{near}`?"),
    );
    MaterialError::new(format!("no curve of Young's modulus is called `{name}`")).with_help(help)
}
