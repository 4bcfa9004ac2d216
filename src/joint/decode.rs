//! The tree handed to serde: a reader that takes note of a fault and goes on, so that one run tells them all.
//!
//! Unknown and repeated keys are left out of a section, a value of the wrong shape is read as an empty one;
//! each is a fault at its place. Types that do not know this reader get ordinary serde errors.

use std::fmt;

use serde::de::{self, DeserializeSeed, Deserializer, IntoDeserializer, Visitor};

use super::diagnose::{Fault, Faults};
use super::file;
use super::tree::{Content, Entry, NodeId, Tree};
use super::written::Refused;
use crate::diagnostic::did_you_mean;

/// Name under which [`super::written::At`] asks for the place of a value.
pub(crate) const AT: &str = "hubgrip::At";

/// Name under which [`super::written::TextOr`] asks for a text or a section, whichever stands there.
pub(crate) const TEXT_OR: &str = "hubgrip::TextOr";

/// Most characters of a text that a message repeats.
const LONGEST_SHOWN: usize = 40;

/// One value of the tree, ready to be read.
#[derive(Clone, Copy)]
pub(crate) struct Value<'t> {
    pub(crate) tree: &'t Tree,
    pub(crate) node: NodeId,
    pub(crate) faults: &'t Faults,
}

/// Why a value was refused by the type that reads it.
#[derive(Debug)]
pub(crate) struct Refusal {
    node: Option<NodeId>,
    in_key: bool,
    refused: Refused,
}

impl Refusal {
    fn at(self, node: NodeId) -> Self {
        Self { node: self.node.or(Some(node)), ..self }
    }

    /// The refusal as a fault, at `node` when the refusal has no place of its own.
    pub(crate) fn fault(self, node: NodeId) -> Fault {
        let node = self.node.unwrap_or(node);
        let fault = if self.in_key { Fault::key } else { Fault::value };
        fault(node, self.refused.message).maybe_help(self.refused.help)
    }
}

impl fmt::Display for Refusal {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.refused.message)
    }
}

impl std::error::Error for Refusal {}

impl de::Error for Refusal {
    fn custom<T: fmt::Display>(message: T) -> Self {
        Self { node: None, in_key: false, refused: Refused::split(&message.to_string()) }
    }

    fn missing_field(field: &'static str) -> Self {
        let refused = Refused { message: format!("`{field}` is missing in this section"), help: None };
        Self { node: None, in_key: true, refused }
    }

    fn unknown_variant(word: &str, known: &'static [&'static str]) -> Self {
        let help = match did_you_mean(word, known.iter().copied()) {
            Some(found) => format!("did you mean `{found}`?"),
            None => format!("write one of {}", known.join(", ")),
        };
        Self { node: None, in_key: false, refused: Refused::new(format!("unknown word `{word}`"), help) }
    }

    fn unknown_field(field: &str, known: &'static [&'static str]) -> Self {
        let help = match did_you_mean(field, known.iter().copied()) {
            Some(found) => format!("did you mean `{found}`?"),
            None => format!("the keys here are {}", known.join(", ")),
        };
        Self { node: None, in_key: true, refused: Refused::new(format!("unknown key `{field}`"), help) }
    }
}

impl<'t> Value<'t> {
    fn content(&self) -> &'t Content {
        self.tree.content(self.node)
    }

    fn with(&self, node: NodeId) -> Self {
        Self { node, ..*self }
    }

    fn name(&self) -> String {
        match self.tree.key(self.node) {
            Some(key) => format!("`{key}`"),
            None if self.node == self.tree.root() => "a joint file".to_owned(),
            None => "an item of this list".to_owned(),
        }
    }

    /// The text, or none of it when it holds signs that steer a terminal instead of being shown.
    fn printable(&self, text: &'t str) -> &'t str {
        if !text.contains(|c: char| c.is_control() && !matches!(c, '\n' | '\t')) {
            return text;
        }
        self.faults.add(Fault::value(self.node, format!("{} holds a control character", self.name())));
        ""
    }

    /// Takes note that the value is not of the shape that is due.
    fn misshapen(&self, due: &str) {
        let is = match self.content() {
            Content::Null => {
                let fault = Fault::key(self.node, format!("{} has no value", self.name()))
                    .help("write a value after the colon, or take the key out");
                return self.faults.add(fault);
            }
            Content::Scalar(text) => format!("`{}`", shortened(text)),
            Content::List(_) => "a list".to_owned(),
            Content::Map(_) => "a section with keys of its own".to_owned(),
        };
        self.faults.add(Fault::value(self.node, format!("{} is {due}, not {is}", self.name())));
    }

    /// The entries of a section that are among `known`; the others are faults.
    fn known_entries(&self, entries: &'t [Entry], known: &'static [&'static str]) -> Vec<(&'t str, NodeId)> {
        let mut kept = Vec::with_capacity(entries.len());
        for entry in entries {
            if self.faults.full() {
                self.faults.count();
            } else if entry.repeated {
                let fault = Fault::key(
                    entry.value,
                    format!("`{}` stands twice in this section", shortened(&entry.key)),
                )
                .help("keep one of the two");
                self.faults.add(fault);
            } else if known.contains(&entry.key.as_str()) {
                kept.push((entry.key.as_str(), entry.value));
            } else {
                self.faults.add(self.unknown(entry, known));
            }
        }
        kept
    }

    fn unknown(&self, entry: &Entry, known: &'static [&'static str]) -> Fault {
        if entry.key == "<<" {
            let fault = Fault::key(entry.value, "merge keys (`<<`) are not read");
            return fault.help("write the keys out in the section that shall have them");
        }
        let section = self.tree.key_path(self.node);
        let place = if section.is_empty() { String::new() } else { format!(" in `{section}`") };
        let fault = Fault::key(entry.value, format!("unknown key `{}`{place}", shortened(&entry.key)));
        let offered = known.iter().copied();
        let help = if let Some(found) = did_you_mean(&shortened(&entry.key), offered.clone()) {
            self.faults.add_meant(self.node, found);
            format!("did you mean `{found}`?")
        } else if let Some(owners) = file::sections_of(&entry.key) {
            let indent = if self.node == self.tree.root() { ": indent it below its section" } else { "" };
            format!("`{}` is a key of {owners}{indent}", entry.key)
        } else {
            let list: Vec<&str> = offered.collect();
            format!("the keys here are {}", list.join(", "))
        };
        fault.help(help)
    }

    fn number<N: std::str::FromStr>(&self) -> Option<N> {
        match self.content() {
            Content::Scalar(text) => text.trim().parse().ok(),
            _ => None,
        }
    }
}

/// The beginning of a text, on one line and without control characters.
fn shortened(text: &str) -> String {
    let mut start: String =
        text.chars().take(LONGEST_SHOWN).map(|c| if c.is_control() { '\u{fffd}' } else { c }).collect();
    if text.chars().nth(LONGEST_SHOWN).is_some() {
        start.push('…');
    }
    start
}

macro_rules! numbers {
    ($($method:ident $visit:ident $kind:ty;)*) => {
        $(fn $method<V: Visitor<'de>>(self, visitor: V) -> Result<V::Value, Refusal> {
            match self.number::<$kind>() {
                Some(number) => visitor.$visit(number),
                None => self.deserialize_any(visitor),
            }
            .map_err(|refusal: Refusal| refusal.at(self.node))
        })*
    };
}

impl<'de> Deserializer<'de> for Value<'de> {
    type Error = Refusal;

    fn deserialize_any<V: Visitor<'de>>(self, visitor: V) -> Result<V::Value, Refusal> {
        match self.content() {
            Content::Null => visitor.visit_unit(),
            Content::Scalar(text) => visitor.visit_borrowed_str(self.printable(text)),
            Content::List(items) => visitor.visit_seq(Items { value: self, items: items.iter() }),
            Content::Map(entries) => {
                let entries = entries.iter().map(|entry| (entry.key.as_str(), entry.value)).collect();
                visitor.visit_map(Entries::new(self, entries))
            }
        }
        .map_err(|refusal: Refusal| refusal.at(self.node))
    }

    fn deserialize_str<V: Visitor<'de>>(self, visitor: V) -> Result<V::Value, Refusal> {
        match self.content() {
            Content::Scalar(text) => visitor.visit_borrowed_str(self.printable(text)),
            _ => {
                self.misshapen("one value");
                visitor.visit_borrowed_str("")
            }
        }
        .map_err(|refusal: Refusal| refusal.at(self.node))
    }

    fn deserialize_string<V: Visitor<'de>>(self, visitor: V) -> Result<V::Value, Refusal> {
        self.deserialize_str(visitor)
    }

    fn deserialize_seq<V: Visitor<'de>>(self, visitor: V) -> Result<V::Value, Refusal> {
        match self.content() {
            Content::List(items) => visitor.visit_seq(Items { value: self, items: items.iter() }),
            _ => {
                self.misshapen("a list, each item after `- `");
                visitor.visit_seq(Items { value: self, items: [].iter() })
            }
        }
        .map_err(|refusal: Refusal| refusal.at(self.node))
    }

    fn deserialize_struct<V: Visitor<'de>>(
        self,
        _name: &'static str,
        fields: &'static [&'static str],
        visitor: V,
    ) -> Result<V::Value, Refusal> {
        let entries = match self.content() {
            Content::Map(entries) => self.known_entries(entries, fields),
            _ => {
                self.misshapen("a section with keys of its own");
                Vec::new()
            }
        };
        visitor.visit_map(Entries::new(self, entries)).map_err(|refusal: Refusal| refusal.at(self.node))
    }

    fn deserialize_option<V: Visitor<'de>>(self, visitor: V) -> Result<V::Value, Refusal> {
        if *self.content() == Content::Null {
            self.misshapen("");
            return visitor.visit_none();
        }
        visitor.visit_some(self)
    }

    fn deserialize_newtype_struct<V: Visitor<'de>>(
        self,
        name: &'static str,
        visitor: V,
    ) -> Result<V::Value, Refusal> {
        match (name, self.content()) {
            (AT, _) => visitor.visit_seq(Placed { value: self, told: false }),
            (TEXT_OR, Content::Scalar(text)) => visitor.visit_borrowed_str(self.printable(text)),
            _ => visitor.visit_newtype_struct(self),
        }
        .map_err(|refusal: Refusal| refusal.at(self.node))
    }

    fn deserialize_enum<V: Visitor<'de>>(
        self,
        _name: &'static str,
        _variants: &'static [&'static str],
        visitor: V,
    ) -> Result<V::Value, Refusal> {
        match self.content() {
            Content::Scalar(text) => visitor.visit_enum(text.as_str().into_deserializer()),
            Content::Map(entries) => {
                let entries = entries.iter().map(|entry| (entry.key.as_str(), entry.value)).collect();
                visitor.visit_enum(de::value::MapAccessDeserializer::new(Entries::new(self, entries)))
            }
            _ => self.deserialize_any(visitor),
        }
        .map_err(|refusal: Refusal| refusal.at(self.node))
    }

    fn deserialize_ignored_any<V: Visitor<'de>>(self, visitor: V) -> Result<V::Value, Refusal> {
        visitor.visit_unit()
    }

    numbers! {
        deserialize_bool visit_bool bool;
        deserialize_i8 visit_i8 i8;
        deserialize_i16 visit_i16 i16;
        deserialize_i32 visit_i32 i32;
        deserialize_i64 visit_i64 i64;
        deserialize_u8 visit_u8 u8;
        deserialize_u16 visit_u16 u16;
        deserialize_u32 visit_u32 u32;
        deserialize_u64 visit_u64 u64;
        deserialize_f32 visit_f32 f32;
        deserialize_f64 visit_f64 f64;
    }

    serde::forward_to_deserialize_any! {
        char bytes byte_buf unit unit_struct tuple tuple_struct map identifier
    }
}

/// The items of a list.
struct Items<'t> {
    value: Value<'t>,
    items: std::slice::Iter<'t, NodeId>,
}

impl<'t> de::SeqAccess<'t> for Items<'t> {
    type Error = Refusal;

    fn next_element_seed<T: DeserializeSeed<'t>>(&mut self, seed: T) -> Result<Option<T::Value>, Refusal> {
        match self.items.next() {
            None => Ok(None),
            Some(&node) => seed.deserialize(self.value.with(node)).map(Some),
        }
    }
}

/// The entries of a section.
struct Entries<'t> {
    value: Value<'t>,
    entries: std::vec::IntoIter<(&'t str, NodeId)>,
    next: Option<NodeId>,
}

impl<'t> Entries<'t> {
    fn new(value: Value<'t>, entries: Vec<(&'t str, NodeId)>) -> Self {
        Self { value, entries: entries.into_iter(), next: None }
    }
}

impl<'t> de::MapAccess<'t> for Entries<'t> {
    type Error = Refusal;

    fn next_key_seed<K: DeserializeSeed<'t>>(&mut self, seed: K) -> Result<Option<K::Value>, Refusal> {
        let Some((key, node)) = self.entries.next() else { return Ok(None) };
        self.next = Some(node);
        seed.deserialize(de::value::BorrowedStrDeserializer::new(key))
            .map_err(|refusal: Refusal| refusal.at(node))
            .map(Some)
    }

    fn next_value_seed<S: DeserializeSeed<'t>>(&mut self, seed: S) -> Result<S::Value, Refusal> {
        let node = self.next.take().unwrap_or(self.value.node);
        seed.deserialize(self.value.with(node))
    }
}

/// A value with its place before it.
struct Placed<'t> {
    value: Value<'t>,
    told: bool,
}

impl<'t> de::SeqAccess<'t> for Placed<'t> {
    type Error = Refusal;

    fn next_element_seed<T: DeserializeSeed<'t>>(&mut self, seed: T) -> Result<Option<T::Value>, Refusal> {
        if !self.told {
            self.told = true;
            let node = self.value.node.0;
            return seed.deserialize(node.into_deserializer()).map(Some);
        }
        seed.deserialize(self.value).map(Some)
    }
}
