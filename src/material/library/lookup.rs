//! Names of materials: what is forgiven, what is near, what is ambiguous.

use std::fmt;
use std::sync::Arc;

use crate::material::Material;

/// Least Jaro-Winkler similarity of a name that is proposed (common practice, no source).
const NEAR: f64 = 0.8;

/// Most names that are proposed.
const MOST: usize = 3;

/// No material, or more than one, is called so.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct NotFound {
    /// The name as given.
    pub given: String,
    /// Identifiers of the materials that have this designation, when there are several.
    pub candidates: Vec<String>,
    /// Identifiers that may have been meant, the nearest first; when no material has the name.
    pub suggestions: Vec<String>,
}

impl NotFound {
    /// What to write instead.
    pub fn help(&self) -> String {
        if !self.candidates.is_empty() {
            format!("write {}", alternatives(&self.candidates, "`"))
        } else if !self.suggestions.is_empty() {
            format!("did you mean {}?", alternatives(&self.suggestions, "`"))
        } else {
            "`hubgrip materials` lists the library; a material may also be written in place".to_owned()
        }
    }
}

impl fmt::Display for NotFound {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        if self.candidates.is_empty() {
            write!(f, "no material is called `{}`", self.given)
        } else {
            write!(f, "`{}` may be {}", self.given, alternatives(&self.candidates, ""))
        }
    }
}

impl std::error::Error for NotFound {}

/// `a`, `a or b`, `a, b or c`, each between `mark`s.
fn alternatives(names: &[String], mark: &str) -> String {
    let marked: Vec<String> = names.iter().map(|name| format!("{mark}{name}{mark}")).collect();
    match marked.split_last() {
        Some((last, [])) => last.clone(),
        Some((last, others)) => format!("{} or {last}", others.join(", ")),
        None => String::new(),
    }
}

/// A name without case, blanks, hyphens, underscores and `+`, as names are compared.
pub(super) fn plain(name: &str) -> String {
    name.chars()
        .filter(|c| {
            !c.is_whitespace() && !matches!(c, '-' | '_' | '+' | '\u{2010}'..='\u{2015}' | '\u{2212}')
        })
        .flat_map(char::to_lowercase)
        .collect()
}

/// Whether one of `names` is `wanted`, as [`plain`] leaves it.
pub(super) fn any_is<T: AsRef<str>>(names: &[T], wanted: &str) -> bool {
    names.iter().any(|name| plain(name.as_ref()) == wanted)
}

/// The one material of `found`, or the error that lists them.
pub(super) fn only(given: &str, found: Vec<Arc<Material>>) -> Result<Arc<Material>, NotFound> {
    match &found[..] {
        [one] => Ok(one.clone()),
        several => Err(NotFound {
            given: given.to_owned(),
            candidates: several.iter().map(|material| material.id.clone()).collect(),
            suggestions: Vec::new(),
        }),
    }
}

/// The error for a name that no material has, with the nearest identifiers.
pub(super) fn miss<'a>(given: &str, names: impl Iterator<Item = (&'a str, Vec<&'a str>)>) -> NotFound {
    let wanted = plain(given);
    let mut scored: Vec<(f64, &str)> = names
        .map(|(id, designations)| {
            let near = designations.iter().chain([&id]).map(|name| nearness(&wanted, &plain(name)));
            (near.fold(0.0, f64::max), id)
        })
        .filter(|&(score, _)| score >= NEAR)
        .collect();
    scored.sort_by(|a, b| b.0.total_cmp(&a.0).then_with(|| a.1.cmp(b.1)));
    let suggestions = scored.into_iter().take(MOST).map(|(_, id)| id.to_owned()).collect();
    NotFound { given: given.to_owned(), candidates: Vec::new(), suggestions }
}

/// Jaro-Winkler similarity; 1 less a hair when one name is contained in the other.
fn nearness(wanted: &str, known: &str) -> f64 {
    let contained =
        wanted.len() >= 3 && known.len() >= 3 && (known.contains(wanted) || wanted.contains(known));
    if contained { 0.99 } else { strsim::jaro_winkler(wanted, known) }
}

/// Whether `word`, as [`plain`] leaves it, occurs in what a material is called.
pub(super) fn has_word(material: &Material, word: &str) -> bool {
    let texts = [material.id.as_str(), &material.name, material.family.name()];
    let designations = material.designations.iter().map(String::as_str);
    let mut all = texts.into_iter().chain(designations).chain(material.condition.as_deref());
    all.any(|text| plain(text).contains(word))
}
