//! Where a value of the tree stands in the text.
//!
//! The YAML reader tells a place only with an error, so the text is gone through again with an error raised
//! at the value that is looked for. This costs nothing while a file is right.

use std::fmt;

use serde::de::{DeserializeSeed, Deserializer, Error, IgnoredAny, MapAccess, SeqAccess, Visitor};

use super::tree::{Content, NodeId, Tree};
use crate::diagnostic::Place;

/// Part of an entry that is meant.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) enum Part {
    /// Its key.
    Key,
    /// Its value.
    Value,
}

/// A place with how many characters are meant.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) struct Span {
    pub(crate) place: Place,
    pub(crate) width: usize,
}

/// Where `part` of `node` stands.
///
/// A value that is an alias, and a value that is missing or spread over lines, is shown at its key.
pub(crate) fn of_node(text: &str, tree: &Tree, node: NodeId, part: Part) -> Option<Span> {
    let steps = tree.steps(node);
    let key = || {
        let name = tree.key(node)?;
        let place = seek(text, &steps, Part::Key)?;
        Some(Span { place, width: key_width(rest_of_line(text, place), name) })
    };
    if part == Part::Key && tree.key(node).is_some() {
        return key();
    }
    if *tree.content(node) == Content::Null {
        return key();
    }
    let place = seek(text, &steps, Part::Value)?;
    let rest = rest_of_line(text, place);
    let spread =
        matches!(tree.content(node), Content::Map(_) | Content::List(_)) && !rest.starts_with(['{', '[']);
    if tree.key(node).is_some() {
        let at_key = key()?;
        if spread || place < at_key.place {
            return Some(at_key);
        }
    }
    Some(Span { place, width: value_width(rest, tree.content(node)) })
}

/// Place of a byte of `text`.
pub(crate) fn of_byte(text: &str, index: usize) -> Place {
    let before = text.get(..index).unwrap_or(text);
    let line = before.matches('\n').count() + 1;
    let column = before.rsplit('\n').next().unwrap_or("").chars().count() + 1;
    Place { line, column }
}

/// Place of an error of the YAML reader.
///
/// Its byte counts, not its line: the reader also breaks lines at signs that editors do not break at.
pub(crate) fn of_error(text: &str, error: &serde_yaml::Error) -> Option<Place> {
    error.location().map(|at| of_byte(text, at.index()))
}

/// Where the root of a document of `text` stands.
pub(crate) fn of_root(text: &str, document: serde_yaml::Deserializer<'_>) -> Option<Place> {
    raised(text, Seek { steps: &[], part: Part::Value }.deserialize(document))
}

fn seek(text: &str, steps: &[usize], part: Part) -> Option<Place> {
    let document = serde_yaml::Deserializer::from_str(text).next()?;
    raised(text, Seek { steps, part }.deserialize(document))
}

fn raised(text: &str, result: Result<(), serde_yaml::Error>) -> Option<Place> {
    of_error(text, &result.err()?)
}

fn rest_of_line(text: &str, place: Place) -> &str {
    let line = place.line.checked_sub(1).and_then(|index| text.lines().nth(index)).unwrap_or("");
    let start = line.char_indices().nth(place.column.saturating_sub(1)).map_or(line.len(), |(at, _)| at);
    line.get(start..).unwrap_or("")
}

fn key_width(rest: &str, key: &str) -> usize {
    quoted_width(rest).unwrap_or_else(|| key.chars().count()).max(1)
}

fn value_width(rest: &str, content: &Content) -> usize {
    if let Some(width) = quoted_width(rest) {
        return width;
    }
    if rest.starts_with(['{', '[']) {
        return bracket_width(rest);
    }
    if let Content::Scalar(value) = content
        && let Some(start) = rest.find(value.as_str()).filter(|_| !value.is_empty())
        && let Some(before) = rest.get(..start)
    {
        return before.chars().count() + value.chars().count();
    }
    if rest.starts_with(['|', '>']) {
        return 1;
    }
    let written = rest.split(" #").next().unwrap_or(rest);
    written.trim_end().chars().count().max(1)
}

/// Width of a quoted text at the beginning of `rest`, quotes included.
fn quoted_width(rest: &str) -> Option<usize> {
    let mut chars = rest.chars();
    let quote = chars.next().filter(|c| matches!(c, '"' | '\''))?;
    let mut escaped = false;
    for (number, c) in chars.enumerate() {
        if escaped {
            escaped = false;
        } else if c == '\\' && quote == '"' {
            escaped = true;
        } else if c == quote {
            return Some(number + 2);
        }
    }
    Some(rest.trim_end().chars().count())
}

fn bracket_width(rest: &str) -> usize {
    let mut depth = 0_usize;
    for (number, c) in rest.chars().enumerate() {
        match c {
            '{' | '[' => depth += 1,
            '}' | ']' => {
                depth = depth.saturating_sub(1);
                if depth == 0 {
                    return number + 1;
                }
            }
            _ => {}
        }
    }
    rest.trim_end().chars().count().max(1)
}

/// Goes along the steps and raises an error at their end.
#[derive(Clone, Copy)]
struct Seek<'a> {
    steps: &'a [usize],
    part: Part,
}

impl<'de> DeserializeSeed<'de> for Seek<'_> {
    type Value = ();

    fn deserialize<D: Deserializer<'de>>(self, deserializer: D) -> Result<(), D::Error> {
        deserializer.deserialize_any(self)
    }
}

impl<'de> Visitor<'de> for Seek<'_> {
    type Value = ();

    fn expecting(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str("this place")
    }

    fn visit_seq<A: SeqAccess<'de>>(self, mut access: A) -> Result<(), A::Error> {
        let Some((&number, steps)) = self.steps.split_first() else { return Err(here()) };
        for _ in 0..number {
            access.next_element::<IgnoredAny>()?;
        }
        access.next_element_seed(Seek { steps, part: self.part })?;
        Ok(())
    }

    fn visit_map<A: MapAccess<'de>>(self, mut access: A) -> Result<(), A::Error> {
        let Some((&number, steps)) = self.steps.split_first() else { return Err(here()) };
        for _ in 0..number {
            access.next_entry::<IgnoredAny, IgnoredAny>()?;
        }
        if steps.is_empty() && self.part == Part::Key {
            access.next_key_seed(Seek { steps, part: Part::Value })?;
        } else {
            access.next_key::<IgnoredAny>()?;
            access.next_value_seed(Seek { steps, part: self.part })?;
        }
        Ok(())
    }
}

fn here<E: Error>() -> E {
    E::custom("here")
}

#[cfg(test)]
mod tests {
    use super::*;

    const TEXT: &str = "\
title: Größe 1
hub: {material: \"C45 + N\", bore: 0 mm}
duty:
  - state: rated
    torque: 900 N.m # daily
  - {state: peak, torque: *t}
shaft:
  bore: &t 7 mm
  material:
";

    fn span(text: &str, path: &[&str], part: Part) -> Option<(usize, usize, usize)> {
        let tree = crate::joint::grow::tree_of(text).unwrap();
        let mut node = tree.root();
        for step in path {
            node = match tree.content(node) {
                Content::List(items) => items[step.parse::<usize>().unwrap()],
                _ => tree.get(node, step).unwrap(),
            };
        }
        of_node(text, &tree, node, part).map(|span| (span.place.line, span.place.column, span.width))
    }

    #[test]
    fn keys_and_values_are_found_with_their_widths() {
        let text = TEXT.replace("*t", "80 N.m");
        let at = |path: &[&str], part| span(&text, path, part).unwrap();
        assert_eq!(at(&["title"], Part::Value), (1, 8, 7));
        assert_eq!(at(&["hub", "material"], Part::Value), (2, 17, 9));
        assert_eq!(at(&["hub", "material"], Part::Key), (2, 7, 8));
        assert_eq!(at(&["hub", "bore"], Part::Value), (2, 34, 4));
        assert_eq!(at(&["hub"], Part::Value), (2, 6, 33));
        assert_eq!(at(&["duty", "0", "torque"], Part::Value), (5, 13, 7));
        assert_eq!(at(&["duty", "1", "torque"], Part::Value), (6, 27, 6));
        assert_eq!(at(&["duty", "1"], Part::Value), (6, 5, 29));
    }

    #[test]
    fn a_missing_or_spread_value_is_shown_at_its_key() {
        let text = TEXT.replace("*t", "80 N.m");
        assert_eq!(span(&text, &["shaft", "material"], Part::Value), Some((9, 3, 8)));
        assert_eq!(span(&text, &["shaft"], Part::Value), Some((7, 1, 5)));
    }

    #[test]
    fn an_alias_is_shown_at_its_key() {
        let text = "shaft: {bore: &b 7 mm}\nhub: {bore: *b}\n";
        assert_eq!(span(text, &["shaft", "bore"], Part::Value), Some((1, 15, 7)));
        assert_eq!(span(text, &["hub", "bore"], Part::Value), Some((2, 7, 4)));
    }
}
