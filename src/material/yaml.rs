//! Reading a material file, with file, line and column of every fault.

use std::fmt;
use std::path::Path;

use serde::de::{DeserializeSeed, Deserializer, Error as _, IgnoredAny, MapAccess, SeqAccess, Visitor};

use super::record::{MaterialError, MaterialRecord, Step};
use super::{Material, Origin};
use crate::diagnostic::{Diagnostic, Place, did_you_mean};
use crate::quantity::HELP_SEPARATOR;

/// Largest material file that is read, bytes (1 MiB; the parser's time grows with the square for hostile text).
pub const LARGEST_FILE: usize = 1 << 20;

/// The material in `text`; `id_default` is its identifier when the record has none.
///
/// # Errors
/// The first fault with its place in `text`. The caller adds the file with [`Diagnostic::in_file`].
///
/// # Example
/// ```
/// use hubgrip::material::{Origin, yaml};
/// let fault = yaml::read("kind: ductile\nyoungs_modulus: 210\n", "demo", Origin::JointFile).unwrap_err();
/// assert_eq!(fault.place.unwrap().line, 2);
/// assert_eq!(fault.place.unwrap().column, 17);
/// ```
pub fn read(text: &str, id_default: &str, origin: Origin) -> Result<Material, Diagnostic> {
    if text.len() > LARGEST_FILE {
        return Err(Diagnostic::new("the file is larger than 1 MiB").with_help("one material a file"));
    }
    let text = text.strip_prefix('\u{feff}').unwrap_or(text);
    let parser = serde_yaml::Deserializer::from_str(text);
    let record: MaterialRecord =
        serde_path_to_error::deserialize(parser).map_err(|error| of_parser(text, &error))?;
    record.into_material(id_default, origin).map_err(|error| of_record(text, error))
}

/// The material in the file at `path`; its identifier is the file's stem unless the record has one.
///
/// # Errors
/// The first fault, with the file and the place in it.
pub fn read_file(path: &Path) -> Result<Material, Diagnostic> {
    let bytes = std::fs::read(path).map_err(|error| of_file(path, &error.to_string()))?;
    let text = String::from_utf8(bytes).map_err(|_| of_file(path, "the file is not UTF-8 text"))?;
    let stem = path.file_stem().unwrap_or_default().to_string_lossy();
    read(&text, &stem, Origin::File(path.to_path_buf())).map_err(|fault| fault.in_file(path))
}

fn of_file(path: &Path, reason: &str) -> Diagnostic {
    Diagnostic::new(format!("cannot read the material file: {reason}")).in_file(path)
}

fn of_parser(text: &str, error: &serde_path_to_error::Error<serde_yaml::Error>) -> Diagnostic {
    let raw = error.inner().to_string();
    let path = error.path().to_string();
    let (message, help) = wording(&raw, &path);
    let mut diagnostic = Diagnostic::new(message);
    diagnostic.help = help;
    match error.inner().location() {
        Some(location) => {
            let place = Place { line: location.line(), column: location.column() };
            let width = width_at(text, place);
            diagnostic.at(text, place, width)
        }
        None => diagnostic,
    }
}

/// The parser's message without its path and place, and the way out when there is one.
fn wording(raw: &str, path: &str) -> (String, Option<String>) {
    let without_place = raw.rfind(" at line ").map_or(raw, |end| &raw[..end]);
    let message = match without_place.split_once(": ") {
        Some((prefix, rest)) if path.starts_with(prefix) => rest,
        _ => without_place,
    };
    if let Some((message, help)) = message.split_once(HELP_SEPARATOR) {
        return (message.to_owned(), Some(help.to_owned()));
    }
    if let Some((unknown, known)) = message.split_once(", expected ") {
        let unknown = unknown.replace("unknown field", "unknown key");
        let unknown = unknown.replace("unknown variant", "unknown word");
        return (unknown, Some(nearest_of(message).unwrap_or_else(|| format!("write {known}"))));
    }
    let message = message.replace("missing field", "missing key").replace("duplicate field", "duplicate key");
    (message, None)
}

/// The nearest of the names between backticks: the first is what was written, the others what is known.
fn nearest_of(message: &str) -> Option<String> {
    let mut quoted = message.split('`').skip(1).step_by(2);
    let given = quoted.next()?;
    did_you_mean(given, quoted).map(|near| format!("did you mean `{near}`?"))
}

fn of_record(text: &str, error: MaterialError) -> Diagnostic {
    let mut diagnostic = Diagnostic::new(error.message);
    diagnostic.help = error.help;
    match place_of(text, &error.path) {
        Some(place) => {
            let width = width_at(text, place);
            diagnostic.at(text, place, width)
        }
        None => diagnostic,
    }
}

/// Characters from `place` to the end of the word, quoted text or line there.
fn width_at(text: &str, place: Place) -> usize {
    let line = place.line.checked_sub(1).and_then(|index| text.lines().nth(index)).unwrap_or_default();
    let rest: String = line.chars().skip(place.column.saturating_sub(1)).collect();
    let end = match rest.chars().next() {
        Some(quote @ ('"' | '\'')) => rest[1..].find(quote).map(|end| end + 2),
        _ => rest.find([',', ']', '}', ':']).or_else(|| rest.find(" #")),
    };
    rest[..end.unwrap_or(rest.len())].trim_end().chars().count().max(1)
}

/// Where the value at `path` stands in the YAML `text`; none when there is no such value.
pub fn place_of(text: &str, path: &[Step]) -> Option<Place> {
    let error = Walk(path).deserialize(serde_yaml::Deserializer::from_str(text)).err()?;
    let location = error.location()?;
    error.to_string().contains(FOUND).then(|| Place { line: location.line(), column: location.column() })
}

const FOUND: &str = "found the value";

/// Walks to a value and raises an error there, whose place is the value's place.
struct Walk<'a>(&'a [Step]);

impl<'de> DeserializeSeed<'de> for Walk<'_> {
    type Value = ();

    fn deserialize<D: Deserializer<'de>>(self, deserializer: D) -> Result<(), D::Error> {
        deserializer.deserialize_any(self)
    }
}

impl<'de> Visitor<'de> for Walk<'_> {
    type Value = ();

    fn expecting(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(FOUND)
    }

    fn visit_map<A: MapAccess<'de>>(self, mut map: A) -> Result<(), A::Error> {
        let Some((Step::Key(wanted), rest)) = self.0.split_first() else {
            return Err(A::Error::custom(FOUND));
        };
        while let Some(key) = map.next_key::<String>()? {
            if key == *wanted {
                return map.next_value_seed(Walk(rest));
            }
            map.next_value::<IgnoredAny>()?;
        }
        Ok(())
    }

    fn visit_seq<A: SeqAccess<'de>>(self, mut list: A) -> Result<(), A::Error> {
        let Some((Step::Index(wanted), rest)) = self.0.split_first() else {
            return Err(A::Error::custom(FOUND));
        };
        for _ in 0..*wanted {
            if list.next_element::<IgnoredAny>()?.is_none() {
                return Ok(());
            }
        }
        list.next_element_seed(Walk(rest)).map(|_| ())
    }
}
