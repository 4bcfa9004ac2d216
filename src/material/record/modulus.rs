//! Young's modulus against temperature as written: the name of a shared curve, or a table.

use std::borrow::Cow;
use std::fmt;
use std::sync::Arc;

use schemars::{JsonSchema, Schema, SchemaGenerator, json_schema};
use serde::Deserialize;
use serde::de::value::MapAccessDeserializer;
use serde::de::{Deserializer, Error, MapAccess, Visitor};

use super::error::{MaterialError, Step};
use crate::material::{ModulusCurve, REFERENCE_TEMPERATURE, modulus_curves};
use crate::numerics::interpolation::MonotoneCubic;
use crate::quantity::{Kind, Number, Pressure, Temperature, written};

/// How far the table's own value at 20 °C may lie from `youngs_modulus`, or a ratio there from one: 2 %.
///
/// Tables are printed for 20, 21 or 25 °C and to three digits; two sources of one steel differ by more. Common practice,
/// no source.
const AGREEMENT: f64 = 0.02;

/// Young's modulus against temperature as written.
///
/// - `carbon steel`: a shared curve by its name, see [`modulus_curves`];
/// - `{moduli: [[20 degC, 210 GPa], [200 degC, 199 GPa], …], source: …}`: the modulus itself;
/// - `{ratios: [[20 degC, 1], [200 degC, 0.95], …], source: …}`: its ratio to that at 20 °C;
/// - `{cold: carbon steel, moduli: […]}`: a shared curve below 20 °C, and a table from 20 °C on.
///
/// The table must reach 20 °C. What counts is the ratio to its own value there, and `youngs_modulus` is the modulus at
/// 20 °C.
#[derive(Debug, Clone, PartialEq)]
pub enum ModulusRecord {
    /// A shared curve.
    Named(String),
    /// A table.
    Table(ModulusTable),
}

/// The mapping form of a modulus against temperature.
#[derive(Debug, Clone, Default, PartialEq, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct ModulusTable {
    /// Name of a shared curve used below 20 °C.
    cold: Option<String>,
    /// Temperatures with Young's modulus at each.
    moduli: Option<Vec<(Temperature, Pressure)>>,
    /// Temperatures with the ratio of Young's modulus to that at 20 °C.
    ratios: Option<Vec<(Temperature, Number)>>,
    /// False when the modulus may rise with the temperature.
    #[serde(default = "yes")]
    monotone: bool,
    /// Where the figures come from.
    source: Option<String>,
}

impl JsonSchema for ModulusRecord {
    fn inline_schema() -> bool {
        true
    }

    fn schema_name() -> Cow<'static, str> {
        "YoungsModulusCurve".into()
    }

    fn json_schema(generator: &mut SchemaGenerator) -> Schema {
        json_schema!({
            "description": "Young's modulus against temperature: the name of a shared curve, or a table",
            "anyOf": [
                { "type": "string", "examples": ["carbon steel", "aluminium"] },
                generator.subschema_for::<ModulusTable>(),
            ],
        })
    }
}

fn yes() -> bool {
    true
}

impl<'de> Deserialize<'de> for ModulusRecord {
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Self, D::Error> {
        deserializer.deserialize_any(ModulusVisitor)
    }
}

struct ModulusVisitor;

impl<'de> Visitor<'de> for ModulusVisitor {
    type Value = ModulusRecord;

    fn expecting(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(
            "the name of a curve such as `carbon steel`, or a mapping with a table of `moduli` or `ratios`",
        )
    }

    fn visit_str<E: Error>(self, text: &str) -> Result<Self::Value, E> {
        Ok(ModulusRecord::Named(text.trim().to_owned()))
    }

    fn visit_map<A: MapAccess<'de>>(self, map: A) -> Result<Self::Value, A::Error> {
        ModulusTable::deserialize(MapAccessDeserializer::new(map)).map(ModulusRecord::Table)
    }
}

impl ModulusRecord {
    /// The curve; the path of an error begins below the key `youngs_modulus_curve`. `own` is the modulus at 20 °C (Pa)
    /// of the record that the table stands in.
    pub(crate) fn into_curve(
        self,
        own: Option<f64>,
        record: &Arc<str>,
    ) -> Result<ModulusCurve, MaterialError> {
        match self {
            Self::Named(name) => modulus_curves::named(&name),
            Self::Table(table) => table.into_curve(own, record),
        }
    }
}

/// A row of the table with its place.
struct Row {
    kelvin: f64,
    value: f64,
    path: Vec<Step>,
}

impl ModulusTable {
    fn into_curve(self, own: Option<f64>, record: &Arc<str>) -> Result<ModulusCurve, MaterialError> {
        let source = self.source.as_deref().map_or_else(|| record.clone(), Arc::from);
        let (key, wanted, mut rows) = self.rows(own)?;
        check_rows(key, &rows, self.monotone)?;
        let reference = at_reference(key, &rows)?;
        if let Some(wanted) = wanted
            && (reference / wanted - 1.0).abs() > AGREEMENT
        {
            return Err(disagreement(key, reference, wanted));
        }
        if let Some(name) = &self.cold {
            let shared = modulus_curves::named(name).map_err(|error| error.under("cold"))?;
            if let Some(first) = rows.first().filter(|first| first.kelvin < REFERENCE_TEMPERATURE) {
                let error =
                    MaterialError::new("`cold` gives the modulus below 20 degC: the table begins there");
                return Err(located(error, &first.path));
            }
            let cold = shared.points().iter().filter(|point| point.0 < REFERENCE_TEMPERATURE);
            let cold = cold.map(|&(kelvin, ratio)| Row {
                kelvin,
                value: ratio * reference,
                path: vec!["cold".into()],
            });
            rows = cold.chain(rows).collect();
            check_rows(key, &rows, self.monotone)?;
        }
        let points: Vec<(f64, f64)> = rows.iter().map(|row| (row.kelvin, row.value)).collect();
        ModulusCurve::from_points(&points, source).map_err(|error| MaterialError::new(error.to_string()))
    }

    /// The key of the table, the value that it should have at 20 °C where that is known, and its rows.
    fn rows(&self, own: Option<f64>) -> Result<(&'static str, Option<f64>, Vec<Row>), MaterialError> {
        // 68 °F is 20 °C but for its last digit.
        let snapped = |kelvin: f64| {
            if (kelvin - REFERENCE_TEMPERATURE).abs() < 1e-6 { REFERENCE_TEMPERATURE } else { kelvin }
        };
        let row = |key: &'static str, index: usize, kelvin: f64, value: f64| Row {
            kelvin: snapped(kelvin),
            value,
            path: vec![key.into(), index.into()],
        };
        match (&self.moduli, &self.ratios) {
            (Some(_), Some(_)) => {
                Err(MaterialError::new("`moduli` and `ratios` are both given").under("ratios"))
            }
            (Some(moduli), None) => {
                let rows = moduli.iter().enumerate();
                let rows = rows.map(|(index, (at, modulus))| row("moduli", index, at.0, modulus.0));
                Ok(("moduli", own, rows.collect()))
            }
            (None, Some(ratios)) => {
                let rows = ratios.iter().enumerate();
                let rows = rows.map(|(index, (at, ratio))| row("ratios", index, at.0, ratio.0));
                Ok(("ratios", Some(1.0), rows.collect()))
            }
            (None, None) => Err(MaterialError::new("the curve of Young's modulus has no table").with_help(
                "give `moduli` or `ratios`, such as `moduli: [[20 degC, 210 GPa], [200 degC, 199 GPa]]`",
            )),
        }
    }
}

fn check_rows(key: &'static str, rows: &[Row], monotone: bool) -> Result<(), MaterialError> {
    if rows.len() < 2 {
        let error =
            MaterialError::new(format!("a table needs at least two rows, this one has {}", rows.len()));
        return Err(error.with_help("one of them at 20 degC or on each side of it").under(key));
    }
    for row in rows {
        if row.value <= 0.0 {
            let what = if key == "moduli" { "Young's modulus" } else { "the ratio of Young's modulus" };
            let error = MaterialError::new(format!("{what} must be greater than zero"));
            return Err(located(error, &row.path));
        }
    }
    for pair in rows.windows(2) {
        if pair[1].kelvin <= pair[0].kelvin {
            let error = MaterialError::new("temperatures must rise from row to row");
            return Err(located(error, &pair[1].path));
        }
        if monotone && pair[1].value > pair[0].value {
            let error =
                MaterialError::new("Young's modulus rises from the row before to this one when heated")
                    .with_help("write `monotone: false` when that is meant");
            return Err(located(error, &pair[1].path));
        }
    }
    Ok(())
}

/// The table's own value at 20 °C.
fn at_reference(key: &'static str, rows: &[Row]) -> Result<f64, MaterialError> {
    let points: Vec<(f64, f64)> = rows.iter().map(|row| (row.kelvin, row.value)).collect();
    let curve =
        MonotoneCubic::new(&points).map_err(|error| MaterialError::new(error.to_string()).under(key))?;
    let (from, to) = curve.range();
    curve.value(REFERENCE_TEMPERATURE).map_err(|_| {
        let text = |kelvin| written(Kind::Temperature, kelvin);
        MaterialError::new(format!(
            "the table does not reach 20 degC: it runs from {} to {}",
            text(from),
            text(to)
        ))
        .with_help(
            "`youngs_modulus` is the value at 20 degC, and the table is read against its own value there",
        )
        .under(key)
    })
}

fn disagreement(key: &'static str, found: f64, wanted: f64) -> MaterialError {
    let (found, wanted, help) = if key == "moduli" {
        let text = |pascals| written(Kind::Pressure, pascals);
        (text(found), format!("youngs_modulus is {}", text(wanted)), "correct one of them, or give `ratios`")
    } else {
        (crate::quantity::number(found, 4), "it must be 1".to_owned(), "ratios are to the modulus at 20 degC")
    };
    MaterialError::new(format!("at 20 degC the table has {found}, but {wanted}")).with_help(help).under(key)
}

fn located(mut error: MaterialError, path: &[Step]) -> MaterialError {
    error.path = path.iter().cloned().chain(error.path).collect();
    error
}
