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
        if self.full() {
            return self.count();
        }
        let mut list = self.list.borrow_mut();
        if !list.iter().any(|known| known.node == fault.node && known.part == fault.part) {
            list.push(fault);
        }
    }

    /// Whether so many faults are known that another one is only counted.
    pub(crate) fn full(&self) -> bool {
        self.list.borrow().len() >= MOST_KEPT
    }

    /// Counts a fault that is not kept.
    pub(crate) fn count(&self) {
        self.dropped.set(self.dropped.get() + 1);
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
///
/// What is not closed is shown where it opens.
pub(crate) fn of_yaml(text: &str, error: &serde_yaml::Error) -> Diagnostic {
    let told = error.to_string();
    let place = odd_byte(&told).map(|at| place::of_byte(text, at)).or_else(|| place::of_error(text, error));
    let (message, help, place) = match place {
        Some(place) if tab_indents(text, place) => {
            ("a tab indents this line".to_owned(), Some("indent with blanks, not with tabs"), Some(place))
        }
        _ => match YAML_FAULTS.iter().find(|known| told.contains(known.pattern)) {
            Some(known) => {
                let opening = if known.at_opening { opening(text, &told) } else { None };
                let place = opening.or(place);
                (known.message.to_owned(), known.help, place)
            }
            None => (plain(&told), None, place),
        },
    };
    let fault = Diagnostic { help: help.map(str::to_owned), ..Diagnostic::new(message) };
    match place {
        Some(place) => fault.at(text, place, 1),
        None => fault,
    }
}

/// A message of the YAML reader with what it means to somebody who writes a joint file.
struct YamlFault {
    pattern: &'static str,
    message: &'static str,
    help: Option<&'static str>,
    /// Shown where the unclosed thing opens, not where the reader noticed.
    at_opening: bool,
}

const YAML_FAULTS: [YamlFault; 14] = [
    fault(
        "mapping values are not allowed",
        "a second `: ` in one line, or a line that is not indented like its neighbours",
        "put quotes round a text that holds `: `, and indent all keys of a section alike",
    ),
    fault("repetition limit exceeded", "the aliases expand too far", "write the values out"),
    fault("recursion limit exceeded", "nested too deeply", "a joint file nests five levels at most"),
    fault(
        "invalid type: enum",
        "a YAML tag (a word that begins with `!`) has no meaning here",
        "write the value without it",
    ),
    fault(
        "a plain word as key",
        "a key must be a plain word",
        "write `key: value`, such as `diameter: 60 mm`",
    ),
    fault(
        "did not find expected key",
        "a key is expected here",
        "indent all keys of a section alike, and write `key: value`",
    ),
    fault(
        "found character that cannot start",
        "a text does not begin with this sign unless it is quoted",
        "put quotes round the text",
    ),
    fault("did not find expected node content", "a value is expected here", "write `key: value`"),
    fault(
        "control characters are not allowed",
        "a control character stands here",
        "take it out; a joint file is plain text",
    ),
    fault("unknown anchor", "an alias without its anchor", "write the value out"),
    YamlFault {
        pattern: "could not find expected ':'",
        message: "a key without `: ` and a value",
        help: Some("write `key: value`, with a blank after the colon"),
        at_opening: true,
    },
    fault(
        "found unexpected ':'",
        "a key in braces without a value",
        "write `{key: value, key: value}`, with a blank after each colon",
    ),
    YamlFault {
        pattern: "did not find expected ',' or",
        message: "a brace or bracket is not closed, or a comma is missing in it",
        help: Some("write `{key: value, key: value}`"),
        at_opening: true,
    },
    YamlFault {
        pattern: "while scanning a quoted scalar",
        message: "a quote is not closed",
        help: Some("close it, or take it out: most texts need no quotes"),
        at_opening: true,
    },
];

const fn fault(pattern: &'static str, message: &'static str, help: &'static str) -> YamlFault {
    YamlFault { pattern, message, help: Some(help), at_opening: false }
}

fn tab_indents(text: &str, place: Place) -> bool {
    let line = text.lines().nth(place.line.saturating_sub(1)).unwrap_or_default();
    line.chars().take_while(|c| c.is_whitespace()).any(|c| c == '\t')
}

/// The second place in a message of the reader: where the thing begins that it was reading.
fn opening(text: &str, told: &str) -> Option<Place> {
    let (_, place) = told.split_once(", while")?.1.split_once(" at line ")?;
    let (line, column) = place.split_once(" column ")?;
    let place = Place { line: line.parse().ok()?, column: column.parse().ok()? };
    let width = text.lines().nth(place.line.checked_sub(1)?)?.chars().count();
    (place.column <= width).then_some(place)
}

/// The byte that a message of the reader complains of: a sign that no text file holds.
fn odd_byte(told: &str) -> Option<usize> {
    let (_, position) = told.split_once(" at position ")?;
    position.split(|c: char| !c.is_ascii_digit()).next()?.parse().ok()
}

/// The message without the path before it and the places in it.
fn plain(told: &str) -> String {
    let cut = told.split(" at line ").next().unwrap_or(told);
    cut.rsplit(": ").next().unwrap_or(cut).to_owned()
}
