//! From YAML text to the tree of values.
//!
//! YAML resolves `1.0060` to the number 1.006 and `1e3` to 1000; a material number or a drawing number must
//! not change so. Keys that are known to hold one value are therefore asked for their text. Where another
//! value was resolved, the text is gone through a second time, for the scalars alone.

use std::collections::BTreeSet;
use std::fmt;

use serde::de::{DeserializeSeed, Deserializer, Error as _, IgnoredAny, MapAccess, SeqAccess, Visitor};

use super::diagnose;
use super::place;
use super::tree::{Content, Entry, NodeId, Origin, Tree};
use crate::diagnostic::{Diagnostic, Place};

/// Most values a joint file may hold once its aliases are written out (common practice, no source).
const MOST_VALUES: usize = 100_000;

/// Deepest nesting of brackets that is handed to the YAML reader, whose time grows with its square.
const DEEPEST_BRACKETS: usize = 256;

/// Keys that hold one value which often looks like a number.
const ONE_VALUE: [&str; 14] = [
    "joint_file",
    "title",
    "drawing",
    "note",
    "date",
    "state",
    "holding",
    "pressing",
    "release",
    "factor",
    "slip_safety",
    "yield_safety",
    "fracture_safety",
    "poisson",
];

/// The tree of one YAML document.
pub(crate) fn tree_of(text: &str) -> Result<Tree, Box<Diagnostic>> {
    refuse_deep_brackets(text)?;
    let quick = if text.contains('!') { None } else { grown(text, true).ok() };
    let Growth { mut tree, unresolved, .. } = match quick {
        Some(growth) => growth,
        None => grown(text, false)?,
    };
    if unresolved && let Some(document) = serde_yaml::Deserializer::from_str(text).next() {
        let node = tree.root();
        Fill { tree: &mut tree, node }
            .deserialize(document)
            .map_err(|error| Box::new(diagnose::of_yaml(text, &error)))?;
    }
    Ok(tree)
}

/// The structure; `by_key`: keys of [`ONE_VALUE`] are asked for their text, which fails if it is something else.
fn grown(text: &str, by_key: bool) -> Result<Growth, Box<Diagnostic>> {
    let mut growth = Growth { tree: Tree::empty(), by_key, unresolved: false };
    let mut documents = serde_yaml::Deserializer::from_str(text);
    let Some(first) = documents.next() else {
        growth.tree.add(Content::Null, Origin::File, None);
        return Ok(growth);
    };
    Grow { growth: &mut growth, parent: None }
        .deserialize(first)
        .map_err(|error| Box::new(diagnose::of_yaml(text, &error)))?;
    match documents.next() {
        Some(second) => Err(second_document(text, place::of_root(text, second))),
        None => Ok(growth),
    }
}

/// A tree while it grows.
struct Growth {
    tree: Tree,
    /// Keys of [`ONE_VALUE`] are asked for their text.
    by_key: bool,
    /// Some scalar was resolved to something else than a text.
    unresolved: bool,
}

impl Growth {
    fn add<E: serde::de::Error>(
        &mut self,
        content: Content,
        parent: Option<(NodeId, usize)>,
    ) -> Result<NodeId, E> {
        if self.tree.len() >= MOST_VALUES {
            return Err(E::custom(format_args!("more than {MOST_VALUES} values")));
        }
        Ok(self.tree.add(content, Origin::File, parent))
    }
}

/// Makes a node of the value that comes next.
struct Grow<'a> {
    growth: &'a mut Growth,
    parent: Option<(NodeId, usize)>,
}

impl<'de> DeserializeSeed<'de> for Grow<'_> {
    type Value = NodeId;

    fn deserialize<D: Deserializer<'de>>(self, deserializer: D) -> Result<NodeId, D::Error> {
        deserializer.deserialize_any(self)
    }
}

impl Grow<'_> {
    fn scalar<E: serde::de::Error>(self, text: &str) -> Result<NodeId, E> {
        self.growth.add(Content::Scalar(text.to_owned()), self.parent)
    }

    /// A scalar that YAML resolved to something else than a text: read as typed in the second going.
    fn resolved<E: serde::de::Error>(self) -> Result<NodeId, E> {
        self.growth.unresolved = true;
        self.scalar("")
    }
}

impl<'de> Visitor<'de> for Grow<'_> {
    type Value = NodeId;

    fn expecting(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str("a text, a list or keys with values")
    }

    fn visit_str<E: serde::de::Error>(self, text: &str) -> Result<NodeId, E> {
        self.scalar(text)
    }

    fn visit_bool<E: serde::de::Error>(self, _: bool) -> Result<NodeId, E> {
        self.resolved()
    }

    fn visit_i64<E: serde::de::Error>(self, _: i64) -> Result<NodeId, E> {
        self.resolved()
    }

    fn visit_i128<E: serde::de::Error>(self, _: i128) -> Result<NodeId, E> {
        self.resolved()
    }

    fn visit_u64<E: serde::de::Error>(self, _: u64) -> Result<NodeId, E> {
        self.resolved()
    }

    fn visit_u128<E: serde::de::Error>(self, _: u128) -> Result<NodeId, E> {
        self.resolved()
    }

    fn visit_f64<E: serde::de::Error>(self, _: f64) -> Result<NodeId, E> {
        self.resolved()
    }

    fn visit_unit<E: serde::de::Error>(self) -> Result<NodeId, E> {
        self.growth.add(Content::Null, self.parent)
    }

    fn visit_none<E: serde::de::Error>(self) -> Result<NodeId, E> {
        self.growth.add(Content::Null, self.parent)
    }

    fn visit_seq<A: SeqAccess<'de>>(self, mut access: A) -> Result<NodeId, A::Error> {
        let node = self.growth.add(Content::Null, self.parent)?;
        let mut items = Vec::new();
        while let Some(item) =
            access.next_element_seed(Grow { growth: &mut *self.growth, parent: Some((node, items.len())) })?
        {
            items.push(item);
        }
        self.growth.tree.replace(node, Content::List(items), Origin::File);
        Ok(node)
    }

    fn visit_map<A: MapAccess<'de>>(self, mut access: A) -> Result<NodeId, A::Error> {
        let node = self.growth.add(Content::Null, self.parent)?;
        let mut entries: Vec<Entry> = Vec::new();
        let mut seen = BTreeSet::new();
        while let Some(key) = access.next_key_seed(Key)? {
            let as_typed = self.growth.by_key && ONE_VALUE.contains(&key.as_str());
            let grow = Grow { growth: &mut *self.growth, parent: Some((node, entries.len())) };
            let value = match as_typed {
                true => access.next_value_seed(AsTyped(grow))?,
                false => access.next_value_seed(grow)?,
            };
            let repeated = !seen.insert(key.clone());
            entries.push(Entry { key, value, repeated });
        }
        self.growth.tree.replace(node, Content::Map(entries), Origin::File);
        Ok(node)
    }
}

/// Makes a node of the text that comes next; fails when it is no text.
struct AsTyped<'a>(Grow<'a>);

impl<'de> DeserializeSeed<'de> for AsTyped<'_> {
    type Value = NodeId;

    fn deserialize<D: Deserializer<'de>>(self, deserializer: D) -> Result<NodeId, D::Error> {
        deserializer.deserialize_str(self)
    }
}

impl Visitor<'_> for AsTyped<'_> {
    type Value = NodeId;

    fn expecting(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str("a text")
    }

    fn visit_str<E: serde::de::Error>(self, text: &str) -> Result<NodeId, E> {
        match text {
            "" | "~" | "null" | "Null" | "NULL" => Err(E::custom("there may be no value")),
            text => self.0.scalar(text),
        }
    }
}

/// A key as typed.
struct Key;

impl<'de> DeserializeSeed<'de> for Key {
    type Value = String;

    fn deserialize<D: Deserializer<'de>>(self, deserializer: D) -> Result<String, D::Error> {
        deserializer.deserialize_str(self)
    }
}

impl Visitor<'_> for Key {
    type Value = String;

    fn expecting(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str("a plain word as key")
    }

    fn visit_str<E: serde::de::Error>(self, text: &str) -> Result<String, E> {
        Ok(text.to_owned())
    }
}

/// Puts the scalars as typed into a tree that has its structure.
struct Fill<'a> {
    tree: &'a mut Tree,
    node: NodeId,
}

impl<'de> DeserializeSeed<'de> for Fill<'_> {
    type Value = ();

    fn deserialize<D: Deserializer<'de>>(self, deserializer: D) -> Result<(), D::Error> {
        match self.tree.content(self.node) {
            Content::Null => deserializer.deserialize_ignored_any(IgnoredAny).map(|_| ()),
            Content::Scalar(_) => deserializer.deserialize_str(self),
            Content::List(_) => deserializer.deserialize_seq(self),
            Content::Map(_) => deserializer.deserialize_map(self),
        }
    }
}

impl<'de> Visitor<'de> for Fill<'_> {
    type Value = ();

    fn expecting(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str("the same text again")
    }

    fn visit_str<E: serde::de::Error>(self, text: &str) -> Result<(), E> {
        self.tree.replace(self.node, Content::Scalar(text.to_owned()), Origin::File);
        Ok(())
    }

    fn visit_seq<A: SeqAccess<'de>>(self, mut access: A) -> Result<(), A::Error> {
        let Content::List(items) = self.tree.content(self.node).clone() else { return Ok(()) };
        for node in items {
            access.next_element_seed(Fill { tree: &mut *self.tree, node })?;
        }
        Ok(())
    }

    fn visit_map<A: MapAccess<'de>>(self, mut access: A) -> Result<(), A::Error> {
        let Content::Map(entries) = self.tree.content(self.node) else { return Ok(()) };
        let values: Vec<NodeId> = entries.iter().map(|entry| entry.value).collect();
        for node in values {
            access.next_key::<IgnoredAny>()?.ok_or_else(|| A::Error::custom("a key went missing"))?;
            access.next_value_seed(Fill { tree: &mut *self.tree, node })?;
        }
        Ok(())
    }
}

fn refuse_deep_brackets(text: &str) -> Result<(), Box<Diagnostic>> {
    let mut depth = 0_usize;
    for (index, byte) in text.bytes().enumerate() {
        match byte {
            b'[' | b'{' => depth += 1,
            b']' | b'}' => depth = depth.saturating_sub(1),
            _ => {}
        }
        if depth > DEEPEST_BRACKETS {
            let fault = Diagnostic::new("nested too deeply");
            return Err(Box::new(fault.at(text, place::of_byte(text, index), 1)));
        }
    }
    Ok(())
}

fn second_document(text: &str, place: Option<Place>) -> Box<Diagnostic> {
    let fault = Diagnostic::new("a second document begins here, and a joint file is one document")
        .with_help("put each joint in a file of its own and give `hubgrip check` several files");
    Box::new(match place {
        Some(place) => fault.at(text, place, 1),
        None => fault,
    })
}
