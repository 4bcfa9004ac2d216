//! A value written plain or with its source.

use std::borrow::Cow;
use std::fmt;
use std::marker::PhantomData;
use std::sync::Arc;

use schemars::{JsonSchema, Schema, SchemaGenerator, json_schema};
use serde::Deserialize;
use serde::de::value::{MapAccessDeserializer, StrDeserializer};
use serde::de::{Deserializer, Error, MapAccess, Visitor};

use crate::material::Sourced;

/// A quantity as written: `210 GPa`, or `{value: 210 GPa, source: EN 10088-1, Annex E}`.
#[derive(Debug, Clone, PartialEq)]
pub struct Value<T> {
    /// The quantity.
    pub value: T,
    /// Its own source; without one the source of the record holds.
    pub source: Option<String>,
}

impl<T> Value<T> {
    /// The value as an SI number with its own source, else that of the record.
    pub(super) fn sourced(self, record: &Arc<str>, si: impl Fn(T) -> f64) -> Sourced<f64> {
        let source = self.source.map_or_else(|| record.clone(), Arc::from);
        Sourced { value: si(self.value), source }
    }
}

impl<'de, T: Deserialize<'de>> Deserialize<'de> for Value<T> {
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Self, D::Error> {
        deserializer.deserialize_any(ValueVisitor(PhantomData))
    }
}

#[derive(Deserialize)]
#[serde(deny_unknown_fields)]
struct WithSource<T> {
    value: T,
    source: Option<String>,
}

impl<T: JsonSchema> JsonSchema for Value<T> {
    fn inline_schema() -> bool {
        true
    }

    fn schema_name() -> Cow<'static, str> {
        format!("Sourced{}", T::schema_name()).into()
    }

    fn json_schema(generator: &mut SchemaGenerator) -> Schema {
        let plain = generator.subschema_for::<T>();
        json_schema!({
            "anyOf": [
                plain,
                {
                    "type": "object",
                    "properties": { "value": plain, "source": { "type": "string" } },
                    "required": ["value"],
                    "additionalProperties": false,
                },
            ],
        })
    }
}

struct ValueVisitor<T>(PhantomData<T>);

impl<'de, T: Deserialize<'de>> ValueVisitor<T> {
    fn plain<E: Error>(text: &str) -> Result<Value<T>, E> {
        let value = T::deserialize(StrDeserializer::new(text))?;
        Ok(Value { value, source: None })
    }
}

impl<'de, T: Deserialize<'de>> Visitor<'de> for ValueVisitor<T> {
    type Value = Value<T>;

    fn expecting(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str("a quantity such as `210 GPa`, or `{value: 210 GPa, source: where it comes from}`")
    }

    fn visit_str<E: Error>(self, text: &str) -> Result<Self::Value, E> {
        Self::plain(text)
    }

    fn visit_i64<E: Error>(self, number: i64) -> Result<Self::Value, E> {
        Self::plain(&number.to_string())
    }

    fn visit_u64<E: Error>(self, number: u64) -> Result<Self::Value, E> {
        Self::plain(&number.to_string())
    }

    fn visit_f64<E: Error>(self, number: f64) -> Result<Self::Value, E> {
        Self::plain(&number.to_string())
    }

    fn visit_map<A: MapAccess<'de>>(self, map: A) -> Result<Self::Value, A::Error> {
        let WithSource { value, source } = WithSource::deserialize(MapAccessDeserializer::new(map))?;
        Ok(Value { value, source })
    }
}
