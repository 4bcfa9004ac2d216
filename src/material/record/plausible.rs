//! Values that no material has: a slip of the unit, told before anything is computed from it.

use super::{MaterialError, MaterialRecord};
use crate::material::Kind;
use crate::quantity::{Kind as Quantity, written};

/// Young's modulus of metals, ceramics and other stiff parts, Pa: from below that of lead (16 GPa) to that of diamond
/// (1050 to 1200 GPa), from memory.
const STIFF: (f64, f64) = (10e9, 1.2e12);

/// Young's modulus of polymers, Pa: from soft rubber (1 MPa) to laminates of high-modulus fibre (150 GPa), from memory.
const POLYMER: (f64, f64) = (1e6, 150e9);

/// Density, kg/m³: from stiff foams (100) to above osmium (22 590), from memory.
const DENSITY: (f64, f64) = (100.0, 25_000.0);

/// Strength over Young's modulus that no metal reaches: the theoretical strength of a crystal is about E/10 (textbooks
/// of materials science).
const IDEAL: f64 = 0.1;

/// Refuses a record with a value that no material has; zero and less are told elsewhere.
pub(super) fn check(record: &MaterialRecord) -> Result<(), MaterialError> {
    let modulus = record.youngs_modulus.value.0;
    let (range, all, example) = match record.kind {
        Kind::Ductile | Kind::Brittle => (STIFF, "metals and ceramics", "steel has 210 GPa"),
        Kind::Polymer => (POLYMER, "polymers", "polyamide has 3 GPa"),
    };
    within("youngs_modulus", Quantity::Pressure, modulus, range, (all, example))?;
    let density = record.density.value.0;
    within(
        "density",
        Quantity::Density,
        density,
        DENSITY,
        ("materials", "steel has 7850 kg/m3, which is 7.85 g/cm3"),
    )?;
    if record.kind == Kind::Polymer || modulus <= 0.0 {
        return Ok(());
    }
    for (key, given) in
        [("yield_strength", &record.yield_strength), ("tensile_strength", &record.tensile_strength)]
    {
        below_ideal(key, given.as_ref().map(|given| given.value.0), modulus)?;
    }
    let Some(table) = &record.strength else { return Ok(()) };
    for (index, row) in table.sections.iter().enumerate() {
        for (key, given) in
            [("yield_strength", row.yield_strength), ("tensile_strength", row.tensile_strength)]
        {
            below_ideal(key, given.map(|given| given.0), modulus)
                .map_err(|error| table.place(error.under(index)).under("strength"))?;
        }
    }
    Ok(())
}

fn within(
    key: &str,
    quantity: Quantity,
    value: f64,
    (low, high): (f64, f64),
    (all, example): (&str, &str),
) -> Result<(), MaterialError> {
    if value <= 0.0 || (low..=high).contains(&value) {
        return Ok(());
    }
    let text = |value| written(quantity, value);
    let message =
        format!("{key} {} is outside {} to {}, which hold all {all}", text(value), text(low), text(high));
    Err(MaterialError::new(message).with_help(format!("check the unit: {example}")).under(key))
}

fn below_ideal(key: &str, strength: Option<f64>, modulus: f64) -> Result<(), MaterialError> {
    let Some(strength) = strength.filter(|strength| *strength > IDEAL * modulus) else { return Ok(()) };
    let text = |stress| written(Quantity::Pressure, stress);
    let message = format!(
        "{key} {} is above a tenth of Young's modulus {}, the strength of an ideal crystal",
        text(strength),
        text(modulus)
    );
    Err(MaterialError::new(message).with_help("check the unit: steel has 200 to 2000 MPa").under(key))
}
