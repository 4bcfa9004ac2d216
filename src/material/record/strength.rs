//! Strength as written: rows by ruling section, or one pair of values for any size.

use std::borrow::Cow;
use std::fmt;
use std::sync::Arc;

use schemars::{JsonSchema, Schema, SchemaGenerator, json_schema};
use serde::Deserialize;
use serde::de::value::{MapAccessDeserializer, SeqAccessDeserializer};
use serde::de::{Deserializer, MapAccess, SeqAccess, Visitor};

use super::error::MaterialError;
use super::value::Value;
use crate::material::{Kind, Strength};
use crate::quantity::{Length, Pressure};

/// One row: `{section_up_to: 16 mm, yield_strength: 340 MPa, tensile_strength: 620 MPa}`.
#[derive(Debug, Clone, PartialEq, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct StrengthRow {
    /// Largest ruling section for which the row holds; for castings the wall thickness.
    pub section_up_to: Option<Length>,
    /// Yield strength, Re or Rp0.2.
    pub yield_strength: Option<Pressure>,
    /// Tensile strength.
    pub tensile_strength: Option<Pressure>,
    /// Source of this row, when it differs from the rest.
    pub source: Option<String>,
}

/// The rows, written as a list or as `{source: …, sections: [rows]}`.
#[derive(Debug, Clone, PartialEq)]
pub struct StrengthRecord {
    /// Source of the rows that have none of their own.
    pub source: Option<String>,
    /// The rows, smallest section first.
    pub sections: Vec<StrengthRow>,
    /// Whether the rows were written under the key `sections`.
    under_sections: bool,
}

impl<'de> Deserialize<'de> for StrengthRecord {
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Self, D::Error> {
        deserializer.deserialize_any(StrengthVisitor)
    }
}

#[derive(Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
struct WithSource {
    /// Source of the rows that have none of their own.
    source: Option<String>,
    /// The rows, smallest section first.
    sections: Vec<StrengthRow>,
}

impl JsonSchema for StrengthRecord {
    fn inline_schema() -> bool {
        true
    }

    fn schema_name() -> Cow<'static, str> {
        "Strength".into()
    }

    fn json_schema(generator: &mut SchemaGenerator) -> Schema {
        json_schema!({
            "description": "strengths by ruling section, smallest first",
            "anyOf": [
                generator.subschema_for::<Vec<StrengthRow>>(),
                WithSource::json_schema(generator),
            ],
        })
    }
}

struct StrengthVisitor;

impl<'de> Visitor<'de> for StrengthVisitor {
    type Value = StrengthRecord;

    fn expecting(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str("a list of rows such as `{section_up_to: 16 mm, yield_strength: 340 MPa}`")
    }

    fn visit_seq<A: SeqAccess<'de>>(self, rows: A) -> Result<Self::Value, A::Error> {
        let sections = Vec::deserialize(SeqAccessDeserializer::new(rows))?;
        Ok(StrengthRecord { source: None, sections, under_sections: false })
    }

    fn visit_map<A: MapAccess<'de>>(self, map: A) -> Result<Self::Value, A::Error> {
        let WithSource { source, sections } = WithSource::deserialize(MapAccessDeserializer::new(map))?;
        Ok(StrengthRecord { source, sections, under_sections: true })
    }
}

impl StrengthRecord {
    /// An error in the rows, seen from the key `strength`.
    pub(super) fn place(&self, error: MaterialError) -> MaterialError {
        if self.under_sections { error.under("sections") } else { error }
    }

    /// The rows in SI; the path of an error begins below the key `strength`.
    pub(super) fn into_rows(self, kind: Kind, record: &Arc<str>) -> Result<Vec<Strength>, MaterialError> {
        let under_sections = self.under_sections;
        let common = self.source.map_or_else(|| record.clone(), Arc::from);
        let place = |error: MaterialError| if under_sections { error.under("sections") } else { error };
        if self.sections.is_empty() {
            return Err(place(MaterialError::new("no strength is given").with_help("give at least one row")));
        }
        let rows = self.sections.into_iter().map(|row| row.into_strength(&common)).collect::<Vec<_>>();
        check_rows(kind, &rows).map_err(place)?;
        Ok(rows)
    }
}

impl StrengthRow {
    fn into_strength(self, common: &Arc<str>) -> Strength {
        Strength {
            section_up_to: self.section_up_to.map(|section| section.0),
            yield_strength: self.yield_strength.map(|strength| strength.0),
            tensile_strength: self.tensile_strength.map(|strength| strength.0),
            source: self.source.map_or_else(|| common.clone(), Arc::from),
        }
    }
}

/// One row for any section, from `yield_strength` and `tensile_strength` at the top of the record.
pub(super) fn single_row(
    kind: Kind,
    yield_strength: Option<Value<Pressure>>,
    tensile_strength: Option<Value<Pressure>>,
    record: &Arc<str>,
) -> Result<Vec<Strength>, MaterialError> {
    let yield_strength = yield_strength.map(|value| value.sourced(record, |strength| strength.0));
    let tensile_strength = tensile_strength.map(|value| value.sourced(record, |strength| strength.0));
    let sources: Vec<&Arc<str>> =
        [&yield_strength, &tensile_strength].into_iter().flatten().map(|value| &value.source).collect();
    let source = match sources[..] {
        [one, other] if one != other => Arc::from(format!("yield: {one}; tensile: {other}")),
        [one, ..] => one.clone(),
        [] => record.clone(),
    };
    let row = Strength {
        section_up_to: None,
        yield_strength: yield_strength.map(|strength| strength.value),
        tensile_strength: tensile_strength.map(|strength| strength.value),
        source,
    };
    check_row(kind, &row)?;
    Ok(vec![row])
}

fn check_rows(kind: Kind, rows: &[Strength]) -> Result<(), MaterialError> {
    for (index, row) in rows.iter().enumerate() {
        check_row(kind, row).map_err(|error| error.under(index))?;
    }
    for (index, pair) in rows.windows(2).enumerate() {
        let message = match (pair[0].section_up_to, pair[1].section_up_to) {
            (None, _) => "a row without section_up_to holds for any size, so it must be the last",
            (Some(before), Some(after)) if after <= before => "sections must rise from row to row",
            _ => continue,
        };
        return Err(MaterialError::new(message).under(index + 1));
    }
    Ok(())
}

fn check_row(kind: Kind, row: &Strength) -> Result<(), MaterialError> {
    let values = [
        ("section_up_to", row.section_up_to),
        ("yield_strength", row.yield_strength),
        ("tensile_strength", row.tensile_strength),
    ];
    for (key, value) in values {
        if value.is_some_and(|value| value <= 0.0) {
            return Err(MaterialError::new(format!("{key} must be greater than zero")).under(key));
        }
    }
    match kind {
        Kind::Brittle if row.tensile_strength.is_none() => {
            Err(MaterialError::new("a brittle material needs its tensile_strength")
                .with_help("brittle parts are judged by their greatest tensile stress"))
        }
        Kind::Ductile | Kind::Polymer if row.yield_strength.is_none() => {
            Err(MaterialError::new("a ductile material or polymer needs its yield_strength")
                .with_help("such parts are judged by yield; write `kind: brittle` for one that breaks first"))
        }
        _ => match (row.yield_strength, row.tensile_strength) {
            (Some(yield_strength), Some(tensile)) if yield_strength > tensile => {
                Err(MaterialError::new("yield_strength is greater than tensile_strength")
                    .under("yield_strength"))
            }
            _ => Ok(()),
        },
    }
}
