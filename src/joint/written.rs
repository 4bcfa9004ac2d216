//! The leaves of a joint file: a text with its place, and what it may say.

use std::borrow::Cow;
use std::fmt;
use std::marker::PhantomData;

use schemars::{JsonSchema, Schema, SchemaGenerator, json_schema};
use serde::de::{Deserialize, Deserializer, Error, SeqAccess, Visitor};

use super::decode::{AT, TEXT_OR};
use super::tree::NodeId;
use crate::diagnostic::did_you_mean;
use crate::quantity::{self, HELP_SEPARATOR, Kind, QuantityError};

/// A value with its place in the tree.
#[derive(Debug, Clone)]
pub(crate) struct At<T> {
    pub(crate) node: NodeId,
    pub(crate) value: T,
}

impl<'de, T: Deserialize<'de>> Deserialize<'de> for At<T> {
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Self, D::Error> {
        struct Pair<T>(PhantomData<T>);
        impl<'de, T: Deserialize<'de>> Visitor<'de> for Pair<T> {
            type Value = At<T>;

            fn expecting(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
                f.write_str("a value of a joint file")
            }

            fn visit_seq<A: SeqAccess<'de>>(self, mut access: A) -> Result<At<T>, A::Error> {
                let node = access.next_element()?.ok_or_else(|| A::Error::missing_field("place"))?;
                let value = access.next_element()?.ok_or_else(|| A::Error::missing_field("value"))?;
                Ok(At { node: NodeId(node), value })
            }
        }
        deserializer.deserialize_newtype_struct(AT, Pair(PhantomData))
    }
}

impl<T: JsonSchema> JsonSchema for At<T> {
    fn inline_schema() -> bool {
        true
    }

    fn schema_name() -> Cow<'static, str> {
        T::schema_name()
    }

    fn json_schema(generator: &mut SchemaGenerator) -> Schema {
        generator.subschema_for::<T>()
    }
}

/// A text as typed, of which `L` says what it may hold.
#[derive(Debug, Clone)]
pub(crate) struct Text<L> {
    pub(crate) text: String,
    leaf: PhantomData<L>,
}

/// A text with its place.
pub(crate) type Written<L> = At<Text<L>>;

impl<L> Text<L> {
    pub(crate) fn new(text: impl Into<String>) -> Self {
        Self { text: text.into(), leaf: PhantomData }
    }
}

impl<'de, L> Deserialize<'de> for Text<L> {
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Self, D::Error> {
        String::deserialize(deserializer).map(Self::new)
    }
}

impl<L: JsonSchema> JsonSchema for Text<L> {
    fn inline_schema() -> bool {
        true
    }

    fn schema_name() -> Cow<'static, str> {
        L::schema_name()
    }

    fn json_schema(generator: &mut SchemaGenerator) -> Schema {
        generator.subschema_for::<L>()
    }
}

/// One text, or a section with keys.
#[derive(Debug, Clone)]
pub(crate) enum TextOr<L, T> {
    Text(Text<L>),
    Keys(T),
}

impl<'de, L, T: Deserialize<'de>> Deserialize<'de> for TextOr<L, T> {
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Self, D::Error> {
        struct Either<L, T>(PhantomData<(L, T)>);
        impl<'de, L, T: Deserialize<'de>> Visitor<'de> for Either<L, T> {
            type Value = TextOr<L, T>;

            fn expecting(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
                f.write_str("a text or a section with keys")
            }

            fn visit_str<E: Error>(self, text: &str) -> Result<Self::Value, E> {
                Ok(TextOr::Text(Text::new(text)))
            }

            fn visit_newtype_struct<D: Deserializer<'de>>(self, keys: D) -> Result<Self::Value, D::Error> {
                T::deserialize(keys).map(TextOr::Keys)
            }
        }
        deserializer.deserialize_newtype_struct(TEXT_OR, Either(PhantomData))
    }
}

impl<L: JsonSchema, T: JsonSchema> JsonSchema for TextOr<L, T> {
    fn inline_schema() -> bool {
        true
    }

    fn schema_name() -> Cow<'static, str> {
        format!("{}Or{}", L::schema_name(), T::schema_name()).into()
    }

    fn json_schema(generator: &mut SchemaGenerator) -> Schema {
        let (text, keys) = (generator.subschema_for::<L>(), generator.subschema_for::<T>());
        json_schema!({ "anyOf": [text, keys] })
    }
}

/// Why a text was refused.
#[derive(Debug, Clone, PartialEq)]
pub(crate) struct Refused {
    pub(crate) message: String,
    pub(crate) help: Option<String>,
}

impl Refused {
    pub(crate) fn new(message: impl Into<String>, help: impl Into<String>) -> Self {
        Self { message: message.into(), help: Some(help.into()) }
    }

    /// A message that may carry its help behind the separator.
    pub(crate) fn split(told: &str) -> Self {
        match told.split_once(HELP_SEPARATOR) {
            Some((message, help)) => Self::new(message, help),
            None => Self { message: told.to_owned(), help: None },
        }
    }
}

impl From<QuantityError> for Refused {
    fn from(error: QuantityError) -> Self {
        Self { message: error.to_string(), help: error.help() }
    }
}

/// What a text may say.
pub(crate) trait Leaf {
    /// What it means.
    type Value;
    /// Longest text that is read, bytes (common practice, no source).
    const LONGEST: usize = 200;
    /// Whether the text may have several lines.
    const LINES: bool = false;

    /// The meaning of a text.
    fn read(text: &str) -> Result<Self::Value, Refused>;
}

macro_rules! quantities {
    ($($kind:ident),*) => {
        $(impl Leaf for quantity::$kind {
            type Value = f64;

            fn read(text: &str) -> Result<f64, Refused> {
                Ok(quantity::parse(Kind::$kind, text)?)
            }
        })*
    };
}

quantities!(
    Angle,
    Force,
    Length,
    Number,
    Pressure,
    Speed,
    Temperature,
    TemperatureDifference,
    Time,
    Torque,
    Volume
);

/// A length of some micrometres: one without a unit is not taken for millimetres.
impl Leaf for quantity::SmallLength {
    type Value = f64;

    fn read(text: &str) -> Result<f64, Refused> {
        quantity::parse(Kind::Length, text).map_err(|error| error.suggesting("um").into())
    }
}

impl Leaf for quantity::NumberRange {
    type Value = (f64, f64);

    fn read(text: &str) -> Result<(f64, f64), Refused> {
        Ok(quantity::parse_number_range(text)?)
    }
}

/// One line of text, which is shown and nothing else.
#[derive(Debug, Clone)]
pub(crate) struct Line;

/// Text of any number of lines, which is shown and nothing else.
#[derive(Debug, Clone)]
pub(crate) struct Note;

impl Leaf for Line {
    type Value = String;

    fn read(text: &str) -> Result<String, Refused> {
        Ok(text.trim().to_owned())
    }
}

impl Leaf for Note {
    type Value = String;
    const LONGEST: usize = 10_000;
    const LINES: bool = true;

    fn read(text: &str) -> Result<String, Refused> {
        Ok(text.trim().to_owned())
    }
}

macro_rules! shown_texts {
    ($($name:ident),*) => {
        $(impl JsonSchema for $name {
            fn inline_schema() -> bool {
                true
            }

            fn schema_name() -> Cow<'static, str> {
                stringify!($name).into()
            }

            fn json_schema(_: &mut SchemaGenerator) -> Schema {
                json_schema!({ "type": ["string", "number"] })
            }
        })*
    };
}

shown_texts!(Line, Note);

/// One of a few words.
pub(crate) trait Words {
    /// What they mean.
    type Value: Copy + 'static;
    /// What they are words for.
    const SUBJECT: &'static str;
    /// Every spelling; the first of each meaning is the one to suggest.
    const WORDS: &'static [(&'static str, Self::Value)];
}

/// The meaning of a word; case, hyphens and underscores are forgiven.
pub(crate) fn read_word<W: Words>(text: &str) -> Result<W::Value, Refused> {
    let plain = |word: &str| word.trim().replace(['-', '_'], " ").to_lowercase();
    let given = plain(text);
    if let Some((_, value)) = W::WORDS.iter().find(|(word, _)| plain(word) == given) {
        return Ok(*value);
    }
    let words = || W::WORDS.iter().map(|(word, _)| *word);
    let message = format!("`{text}` is not a {}", W::SUBJECT);
    let all = words().collect::<Vec<_>>().join(", ");
    Err(match did_you_mean(text, words()) {
        Some(found) => Refused::new(message, format!("did you mean `{found}`? ({all})")),
        None => Refused::new(message, format!("write one of {all}")),
    })
}

/// A leaf that is one of a few words.
macro_rules! words {
    ($(#[$doc:meta])* $name:ident: $value:ty, $subject:literal, $($word:literal => $meaning:expr),* $(,)?) => {
        $(#[$doc])*
        #[derive(Debug, Clone)]
        pub(crate) struct $name;

        impl $crate::joint::written::Words for $name {
            type Value = $value;
            const SUBJECT: &'static str = $subject;
            const WORDS: &'static [(&'static str, $value)] = &[$(($word, $meaning)),*];
        }

        impl $crate::joint::written::Leaf for $name {
            type Value = $value;

            fn read(text: &str) -> Result<$value, $crate::joint::written::Refused> {
                $crate::joint::written::read_word::<Self>(text)
            }
        }

        impl schemars::JsonSchema for $name {
            fn schema_name() -> std::borrow::Cow<'static, str> {
                stringify!($name).into()
            }

            fn json_schema(_: &mut schemars::SchemaGenerator) -> schemars::Schema {
                schemars::json_schema!({ "type": "string", "enum": [$($word),*] })
            }
        }
    };
}

pub(crate) use words;
