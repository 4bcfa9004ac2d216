//! A joint while it is put together: values, defaults, remarks and faults.

use super::DefaultTaken;
use super::decode::Value;
use super::diagnose::{Fault, Faults};
use super::tree::{Content, NodeId, Tree};
use super::written::{Leaf, Written};
use crate::material::library::Library;
use crate::quantity::Length;

/// Smallest length or diameter that is read, m: some atoms (common practice, no source).
pub(crate) const SMALLEST: f64 = 1e-9;

/// A joint while it is put together.
pub(crate) struct Draft<'a> {
    pub(crate) tree: &'a Tree,
    pub(crate) faults: &'a Faults,
    pub(crate) library: &'a Library,
    pub(crate) defaults: Vec<DefaultTaken>,
    pub(crate) remarks: Vec<String>,
}

impl<'a> Draft<'a> {
    /// A draft with nothing in it.
    pub(crate) fn new(tree: &'a Tree, faults: &'a Faults, library: &'a Library) -> Self {
        Self { tree, faults, library, defaults: Vec::new(), remarks: Vec::new() }
    }

    /// The value at `node`, for types that read themselves.
    pub(crate) fn reader(&self, node: NodeId) -> Value<'a> {
        Value { tree: self.tree, node, faults: self.faults }
    }

    /// The meaning of a text; a fault and nothing when it has none.
    pub(crate) fn value<L: Leaf>(&self, written: &Written<L>) -> Option<L::Value> {
        let text = written.value.text.trim();
        if self.faults.touch(written.node) {
            return None;
        }
        if let Some(wrong) = unreadable::<L>(text) {
            let key = self.tree.key(written.node).unwrap_or("this");
            self.faults.add(Fault::value(written.node, format!("`{key}` {wrong}")));
            return None;
        }
        match L::read(text) {
            Ok(value) => Some(value),
            Err(refused) => {
                self.faults.add(Fault::value(written.node, refused.message).maybe_help(refused.help));
                None
            }
        }
    }

    /// The meaning of a text that may be missing.
    pub(crate) fn optional<L: Leaf>(&self, written: Option<&Written<L>>) -> Option<L::Value> {
        written.and_then(|written| self.value(written))
    }

    /// A value that must be there: a fault at its section when it is not.
    pub(crate) fn required<'f, T>(
        &self,
        section: NodeId,
        key: &str,
        example: &str,
        value: Option<&'f T>,
    ) -> Option<&'f T> {
        if value.is_none() && !self.excused(section, key) {
            let place = match self.tree.key_path(section) {
                path if path.is_empty() => String::new(),
                path => format!(" in `{path}`"),
            };
            let fault = Fault::key(section, format!("`{key}` is missing{place}"));
            self.faults.add_missing(fault.help(format!("add a line such as `{key}: {example}`")));
        }
        value
    }

    /// Whether a key is missing only because of another fault that is told already.
    fn excused(&self, section: NodeId, key: &str) -> bool {
        let broken = |node: NodeId| self.faults.touch(node);
        (section != self.tree.root()
            && broken(section)
            && !matches!(self.tree.content(section), Content::Map(_)))
            || self.tree.get(section, key).is_some_and(broken)
            || self.faults.meant(section, key)
    }

    /// A length or a diameter above zero, and no smaller than a part can be.
    pub(crate) fn positive(&self, written: &Written<Length>) -> Option<f64> {
        let value = self.value(written)?;
        if value <= 0.0 {
            self.refuse(written, "must be more than zero");
            return None;
        }
        self.not_tiny(written, value)
    }

    /// A length or a diameter that may be zero, else no smaller than a part can be.
    pub(crate) fn zero_or_positive(&self, written: &Written<Length>) -> Option<f64> {
        let value = self.not_negative(written)?;
        if value == 0.0 { Some(value) } else { self.not_tiny(written, value) }
    }

    fn not_tiny(&self, written: &Written<Length>, value: f64) -> Option<f64> {
        if value >= SMALLEST {
            return Some(value);
        }
        self.refuse(written, "is less than 1 nm, which no part is");
        None
    }

    /// A value not below zero.
    pub(crate) fn not_negative<L: Leaf<Value = f64>>(&self, written: &Written<L>) -> Option<f64> {
        let value = self.value(written)?;
        if value >= 0.0 {
            return Some(value);
        }
        self.refuse(written, "must not be negative");
        None
    }

    /// A fault in a value: its key and its text, then what is wrong with it.
    pub(crate) fn refuse<L>(&self, written: &Written<L>, what: &str) {
        self.faults.add(Fault::value(written.node, format!("{} {what}", self.called(written))));
    }

    /// The key and the text of a value, such as `outer_diameter 50 mm`.
    pub(crate) fn called<L>(&self, written: &Written<L>) -> String {
        let key = self.tree.key(written.node).unwrap_or("value");
        format!("{key} {}", written.value.text.trim())
    }

    /// Takes note of a default.
    pub(crate) fn default(
        &mut self,
        key: impl Into<String>,
        value: impl Into<String>,
        source: impl Into<String>,
    ) {
        self.defaults.push(DefaultTaken { key: key.into(), value: value.into(), source: source.into() });
    }
}

/// Why a text is not even looked at.
fn unreadable<L: Leaf>(text: &str) -> Option<String> {
    if text.is_empty() {
        Some("is an empty text".to_owned())
    } else if text.len() > L::LONGEST {
        Some(format!("is longer than {} characters", L::LONGEST))
    } else if !L::LINES && text.contains('\n') {
        Some("must stand on one line".to_owned())
    } else {
        None
    }
}
