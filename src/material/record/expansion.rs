//! Thermal expansion as written: a mean coefficient, a table, or the name of a shared curve.

use std::borrow::Cow;
use std::fmt;
use std::sync::Arc;

use schemars::{JsonSchema, Schema, SchemaGenerator, json_schema};
use serde::Deserialize;
use serde::de::value::{MapAccessDeserializer, StrDeserializer};
use serde::de::{Deserializer, Error, MapAccess, Visitor};

use super::error::{MaterialError, Step};
use crate::material::{Expansion, REFERENCE_TEMPERATURE, curves};
use crate::numerics::interpolation::InterpolationError;
use crate::quantity::{ExpansionCoefficient, Number, Temperature};

/// Lowest temperature for which a mean coefficient without a stated range is taken to hold: −50 °C, in K.
///
/// Coefficients are printed for 20 to 100 °C. Carried down to −50 °C such a figure overstates the contraction
/// of carbon steel by about 8 % (composite curve of the library), and the error grows quickly below, on the
/// unsafe side: the part shrinks less than computed. Common practice, no source.
pub const MEAN_FROM: f64 = 223.15;

/// Highest temperature for which a mean coefficient without a stated range is taken to hold: 350 °C, in K.
///
/// The mean coefficient of metals rises with temperature, so a figure for 20 to 100 °C understates the
/// expansion, by 11 % for carbon steel at 350 °C: the hub opens more than computed. 350 °C is the highest
/// joining temperature of DIN 7190 (from memory). Common practice, no source.
pub const MEAN_TO: f64 = 623.15;

/// Largest coefficient that is believed, 1/K; plastics reach 2e-4 /K.
const LARGEST_COEFFICIENT: f64 = 1e-3;

/// Expansion of a material as written.
///
/// - `11.5e-6 /K`: one mean coefficient, from [`MEAN_FROM`] to [`MEAN_TO`];
/// - `ferritic steel`: a shared curve by its name, see [`curves`];
/// - `{mean: 11.5e-6 /K, from: 0 degC, to: 100 degC}`: one mean coefficient and where it holds;
/// - `{means: [[100 degC, 12.1e-6 /K], …]}`: mean coefficients between 20 °C and each temperature;
/// - `{curve: [[-196 degC, -0.00195], …]}`: total strain from 20 °C;
/// - `{cold: wrought aluminium, means: […]}`: a shared curve below 20 °C, and what follows above.
///
/// `cold`, `curve` and `means` are joined in this order; the point of zero strain at 20 °C is added.
#[derive(Debug, Clone, PartialEq)]
pub enum ExpansionRecord {
    /// One mean coefficient, 1/K.
    Mean(f64),
    /// A shared curve.
    Named(String),
    /// Any other form.
    Table(ExpansionTable),
}

/// The mapping form of an expansion.
#[derive(Debug, Clone, Default, PartialEq, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct ExpansionTable {
    /// One mean coefficient of expansion from 20 °C.
    mean: Option<ExpansionCoefficient>,
    /// Lowest temperature for which `mean` holds; -50 degC when absent.
    from: Option<Temperature>,
    /// Highest temperature for which `mean` holds; 350 degC when absent.
    to: Option<Temperature>,
    /// Name of a shared curve used below 20 °C.
    cold: Option<String>,
    /// Temperatures with the total strain from 20 °C.
    curve: Option<Vec<(Temperature, Number)>>,
    /// Temperatures with the mean coefficient from 20 °C to each.
    means: Option<Vec<(Temperature, ExpansionCoefficient)>>,
    /// False when the part may shrink on heating.
    #[serde(default = "yes")]
    monotone: bool,
    /// Where the figures come from.
    source: Option<String>,
}

impl JsonSchema for ExpansionRecord {
    fn inline_schema() -> bool {
        true
    }

    fn schema_name() -> Cow<'static, str> {
        "Expansion".into()
    }

    fn json_schema(generator: &mut SchemaGenerator) -> Schema {
        json_schema!({
            "description": "thermal expansion: a mean coefficient, the name of a shared curve, or a table",
            "anyOf": [
                { "type": "string", "examples": ["11.5e-6 /K", "ferritic steel"] },
                generator.subschema_for::<ExpansionTable>(),
            ],
        })
    }
}

fn yes() -> bool {
    true
}

impl<'de> Deserialize<'de> for ExpansionRecord {
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Self, D::Error> {
        deserializer.deserialize_any(ExpansionVisitor)
    }
}

struct ExpansionVisitor;

impl<'de> Visitor<'de> for ExpansionVisitor {
    type Value = ExpansionRecord;

    fn expecting(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str("a coefficient such as `11.5e-6 /K`, the name of a curve, or a mapping with a table")
    }

    fn visit_str<E: Error>(self, text: &str) -> Result<Self::Value, E> {
        if text.trim_start().starts_with(|first: char| first.is_alphabetic()) {
            return Ok(ExpansionRecord::Named(text.trim().to_owned()));
        }
        let coefficient = ExpansionCoefficient::deserialize(StrDeserializer::new(text))?;
        Ok(ExpansionRecord::Mean(coefficient.0))
    }

    fn visit_i64<E: Error>(self, number: i64) -> Result<Self::Value, E> {
        self.visit_str(&number.to_string())
    }

    fn visit_u64<E: Error>(self, number: u64) -> Result<Self::Value, E> {
        self.visit_str(&number.to_string())
    }

    fn visit_f64<E: Error>(self, number: f64) -> Result<Self::Value, E> {
        self.visit_str(&number.to_string())
    }

    fn visit_map<A: MapAccess<'de>>(self, map: A) -> Result<Self::Value, A::Error> {
        ExpansionTable::deserialize(MapAccessDeserializer::new(map)).map(ExpansionRecord::Table)
    }
}

impl ExpansionRecord {
    /// The expansion in SI; the path of an error begins below the key `expansion`.
    pub(crate) fn into_expansion(self, record: &Arc<str>) -> Result<Expansion, MaterialError> {
        match self {
            Self::Mean(coefficient) => {
                check_coefficient(coefficient)?;
                mean(coefficient, MEAN_FROM, MEAN_TO, record.clone())
            }
            Self::Named(name) => curves::named(&name),
            Self::Table(table) => table.into_expansion(record),
        }
    }
}

impl ExpansionTable {
    fn into_expansion(self, record: &Arc<str>) -> Result<Expansion, MaterialError> {
        let source = self.source.as_deref().map_or_else(|| record.clone(), Arc::from);
        let has_table = self.cold.is_some() || self.curve.is_some() || self.means.is_some();
        match self.mean {
            Some(_) if has_table => Err(MaterialError::new(
                "`mean` is one coefficient for a whole range and does not go with cold, curve or means",
            )
            .under("mean")),
            Some(coefficient) => self.single(coefficient.0, source),
            None if has_table => self.table(source),
            None => Err(MaterialError::new("the expansion is empty")
                .with_help("give mean, means or curve, such as `means: [[100 degC, 12.1e-6 /K]]`")),
        }
    }

    fn single(self, coefficient: f64, source: Arc<str>) -> Result<Expansion, MaterialError> {
        check_coefficient(coefficient).map_err(|error| error.under("mean"))?;
        let from = self.from.map_or(MEAN_FROM, |from| from.0);
        let to = self.to.map_or(MEAN_TO, |to| to.0);
        let key = if self.to.is_some() { "to" } else { "from" };
        if !(from <= REFERENCE_TEMPERATURE && REFERENCE_TEMPERATURE <= to && from < to) {
            return Err(MaterialError::new("the range of a mean coefficient must hold 20 degC").under(key));
        }
        mean(coefficient, from, to, source)
    }

    fn table(self, source: Arc<str>) -> Result<Expansion, MaterialError> {
        if self.from.is_some() || self.to.is_some() {
            let key = if self.from.is_some() { "from" } else { "to" };
            return Err(
                MaterialError::new("`from` and `to` go with `mean`; a table has its own ends").under(key)
            );
        }
        let mut points: Vec<Point> = Vec::new();
        if let Some(name) = &self.cold {
            let shared = curves::named(name).map_err(|error| error.under("cold"))?;
            let cold = shared.points().iter().filter(|point| point.0 < REFERENCE_TEMPERATURE);
            points.extend(cold.map(|&(kelvin, strain)| Point { kelvin, strain, path: vec!["cold".into()] }));
        }
        for (index, &(temperature, strain)) in self.curve.iter().flatten().enumerate() {
            let path = vec!["curve".into(), index.into()];
            points.push(Point { kelvin: temperature.0, strain: strain.0, path });
        }
        for (index, &(temperature, coefficient)) in self.means.iter().flatten().enumerate() {
            let path: Vec<Step> = vec!["means".into(), index.into()];
            check_coefficient(coefficient.0).map_err(|error| located(error, &path))?;
            let strain = coefficient.0 * (temperature.0 - REFERENCE_TEMPERATURE);
            points.push(Point { kelvin: temperature.0, strain, path });
        }
        add_zero(&mut points)?;
        check_points(&points, self.monotone)?;
        let pairs: Vec<(f64, f64)> = points.iter().map(|point| (point.kelvin, point.strain)).collect();
        Expansion::from_strains(&pairs, source).map_err(of_table)
    }
}

struct Point {
    kelvin: f64,
    strain: f64,
    path: Vec<Step>,
}

/// Puts the point of zero strain at 20 °C where it belongs, unless it is there.
fn add_zero(points: &mut Vec<Point>) -> Result<(), MaterialError> {
    let near = |point: &Point| (point.kelvin - REFERENCE_TEMPERATURE).abs() < 1e-6;
    if let Some(point) = points.iter_mut().find(|point| near(point)) {
        if point.strain.abs() > 1e-12 {
            let message = format!("the strain at 20 degC must be 0, not {}", point.strain);
            return Err(located(MaterialError::new(message), &point.path));
        }
        (point.kelvin, point.strain) = (REFERENCE_TEMPERATURE, 0.0);
        return Ok(());
    }
    let place = points.partition_point(|point| point.kelvin < REFERENCE_TEMPERATURE);
    points.insert(place, Point { kelvin: REFERENCE_TEMPERATURE, strain: 0.0, path: Vec::new() });
    Ok(())
}

fn check_points(points: &[Point], monotone: bool) -> Result<(), MaterialError> {
    for pair in points.windows(2) {
        let at = if pair[1].path.is_empty() { &pair[0].path } else { &pair[1].path };
        if pair[1].kelvin <= pair[0].kelvin {
            let error = MaterialError::new("temperatures must rise from point to point");
            return Err(located(error, at));
        }
        if monotone && pair[1].strain <= pair[0].strain {
            let error = MaterialError::new("the part does not grow from this point to the next when heated")
                .with_help("write `monotone: false` when that is meant");
            return Err(located(error, at));
        }
    }
    Ok(())
}

fn check_coefficient(coefficient: f64) -> Result<(), MaterialError> {
    if coefficient.abs() < LARGEST_COEFFICIENT {
        return Ok(());
    }
    Err(MaterialError::new(format!("a coefficient of expansion of {coefficient} /K is beyond any material"))
        .with_help("steel has about 12e-6 /K"))
}

fn mean(coefficient: f64, from: f64, to: f64, source: Arc<str>) -> Result<Expansion, MaterialError> {
    Expansion::from_mean(coefficient, from, to, source).map_err(of_table)
}

fn of_table(error: InterpolationError) -> MaterialError {
    MaterialError::new(error.to_string())
}

fn located(mut error: MaterialError, path: &[Step]) -> MaterialError {
    error.path = path.iter().cloned().chain(error.path).collect();
    error
}
