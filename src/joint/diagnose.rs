//! Faults of a joint file: collected while it is read, told in the order of the file.

use std::cell::{Cell, RefCell};
use std::path::Path;

use super::place::{self, Part};
use super::tree::{NodeId, Origin, Tree};
use crate::diagnostic::{Diagnostic, Place};

/// Most faults that are told at once (common practice, no source).
const MOST_TOLD: usize = 20;

/// Most faults that are kept; what comes after is only counted.
const MOST_KEPT: usize = 1000;

/// Something wrong at a value of the tree.
#[derive(Debug, Clone, PartialEq)]
pub(crate) struct Fault {
    node: NodeId,
    part: Part,
    message: String,
    help: Option<String>,
}

impl Fault {
    /// A fault in the value of `node`.
    pub(crate) fn value(node: NodeId, message: impl Into<String>) -> Self {
        Self { node, part: Part::Value, message: message.into(), help: None }
    }

    /// A fault in the key of `node`.
    pub(crate) fn key(node: NodeId, message: impl Into<String>) -> Self {
        Self { node, part: Part::Key, message: message.into(), help: None }
    }

    /// The same fault with the way out.
    pub(crate) fn help(mut self, help: impl Into<String>) -> Self {
        self.help = Some(help.into());
        self
    }

    /// The same fault with the way out, when there is one.
    pub(crate) fn maybe_help(mut self, help: Option<String>) -> Self {
        self.help = help;
        self
    }
}

/// The faults found so far.
#[derive(Debug, Default)]
pub(crate) struct Faults {
    list: RefCell<Vec<Fault>>,
    missing: RefCell<Vec<Fault>>,
    meant: RefCell<Vec<(NodeId, String)>>,
    dropped: Cell<usize>,
}

impl Faults {
    /// Takes note of a fault; only the first at a value is kept.
    pub(crate) fn add(&self, fault: Fault) {
        let mut list = self.list.borrow_mut();
        if list.len() >= MOST_KEPT {
            self.dropped.set(self.dropped.get() + 1);
        } else if !list.iter().any(|known| known.node == fault.node && known.part == fault.part) {
            list.push(fault);
        }
    }

    /// Takes note of a key that is missing in a section; there may be several at one section.
    pub(crate) fn add_missing(&self, fault: Fault) {
        self.missing.borrow_mut().push(fault);
    }

    /// Takes note that an unknown key of `section` was probably meant as `key`.
    pub(crate) fn add_meant(&self, section: NodeId, key: &str) {
        self.meant.borrow_mut().push((section, key.to_owned()));
    }

    /// Whether an unknown key of `section` was probably meant as `key`.
    pub(crate) fn meant(&self, section: NodeId, key: &str) -> bool {
        self.meant.borrow().iter().any(|(at, meant)| *at == section && meant == key)
    }

    /// Whether there is a fault in the value or the key of `node`.
    pub(crate) fn touch(&self, node: NodeId) -> bool {
        self.list.borrow().iter().any(|fault| fault.node == node)
    }

    /// Whether there is a fault in `node` or anywhere below it.
    pub(crate) fn touch_within(&self, tree: &Tree, node: NodeId) -> bool {
        let within = |mut at: NodeId| loop {
            if at == node {
                return true;
            }
            match tree.parent(at) {
                Some((parent, _)) => at = parent,
                None => return false,
            }
        };
        self.list.borrow().iter().any(|fault| within(fault.node))
    }

    /// Whether nothing is wrong.
    pub(crate) fn is_empty(&self) -> bool {
        self.list.borrow().is_empty() && self.missing.borrow().is_empty()
    }

    /// The faults as diagnostics in the order of the file; faults in changes from the command line come last.
    pub(crate) fn told(
        self,
        text: &str,
        tree: &Tree,
        file: &Path,
        set: &[(String, String)],
    ) -> Vec<Diagnostic> {
        let mut list = self.list.into_inner();
        list.append(&mut self.missing.into_inner());
        list.sort_by_cached_key(|fault| {
            let steps = tree.steps(fault.node);
            (tree.origin(fault.node) != Origin::File, steps.is_empty(), steps, fault.part == Part::Value)
        });
        let left_out = list.len().saturating_sub(MOST_TOLD) + self.dropped.get();
        let told = list.into_iter().take(MOST_TOLD);
        let mut told: Vec<Diagnostic> = told.map(|fault| fault.told(text, tree, file, set)).collect();
        if left_out > 0 {
            told.push(Diagnostic::new(format!("{left_out} more faults are not shown")).in_file(file));
        }
        told
    }
}

impl Fault {
    fn told(self, text: &str, tree: &Tree, file: &Path, set: &[(String, String)]) -> Diagnostic {
        let (message, file, span) = match tree.origin(self.node) {
            Origin::Set(number) => {
                let key = set.get(number).map_or("", |(key, _)| key);
                (format!("--set {key}: {}", self.message), None, None)
            }
            Origin::File if self.node == tree.root() => (self.message, Some(file), None),
            Origin::File => (self.message, Some(file), place::of_node(text, tree, self.node, self.part)),
        };
        let diagnostic = Diagnostic { help: self.help, ..Diagnostic::new(message) };
        let diagnostic = match span {
            Some(span) => diagnostic.at(text, span.place, span.width),
            None => diagnostic,
        };
        match file {
            Some(file) => diagnostic.in_file(file),
            None => diagnostic,
        }
    }
}

/// What the YAML reader says, in plain words, with the way out where one is known.
pub(crate) fn yaml_message(text: &str, place: Option<Place>, told: &str) -> (String, Option<String>) {
    if let Some(place) = place
        && let Some(line) = text.lines().nth(place.line.saturating_sub(1))
        && line.chars().take_while(|c| c.is_whitespace()).any(|c| c == '\t')
    {
        return ("a tab indents this line".into(), Some("indent with blanks, not with tabs".into()));
    }
    let message = plain(told);
    let known: [(&str, &str, Option<&str>); 8] = [
        (
            "mapping values are not allowed",
            "a second `: ` in one line, or a line that is not indented like its neighbours",
            Some("put quotes round a text that holds `: `, and indent all keys of a section alike"),
        ),
        ("repetition limit exceeded", "the aliases expand too far", Some("write the values out")),
        ("recursion limit exceeded", "nested too deeply", None),
        (
            "invalid type: enum",
            "a YAML tag (a word that begins with `!`) has no meaning here",
            Some("write the value without it"),
        ),
        (
            "did not find expected key",
            "a key is expected here",
            Some("indent all keys of a section alike, and write `key: value`"),
        ),
        (
            "could not find expected ':'",
            "a key without `: ` and a value",
            Some("write `key: value`, with a blank after the colon"),
        ),
        (
            "found unexpected ':'",
            "a key in braces without a value",
            Some("write `{key: value, key: value}`, with a blank after each colon"),
        ),
        (
            "did not find expected ',' or '}'",
            "a brace is not closed, or a comma is missing",
            Some("write `{key: value, key: value}`"),
        ),
    ];
    for (pattern, message, help) in known {
        if told.contains(pattern) {
            return (message.to_owned(), help.map(str::to_owned));
        }
    }
    (message, None)
}

/// The message without the path before it and the places in it.
fn plain(told: &str) -> String {
    let cut = told.split(" at line ").next().unwrap_or(told);
    cut.rsplit(": ").next().unwrap_or(cut).to_owned()
}
