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
pub fn read(text: &str, id_default: &str, origin: Origin) -> Result<Material, Box<Diagnostic>> {
    if text.len() > LARGEST_FILE {
        let fault = Diagnostic::new("the file is larger than 1 MiB").with_help("one material a file");
        return Err(Box::new(fault));
    }
    let text = text.strip_prefix('\u{feff}').unwrap_or(text);
    let parser = serde_yaml::Deserializer::from_str(text);
    let record: MaterialRecord =
        serde_path_to_error::deserialize(parser).map_err(|error| Box::new(of_parser(text, &error)))?;
    record.into_material(id_default, origin).map_err(|error| Box::new(of_record(text, error)))
}

/// The material in the file at `path`; its identifier is the file's stem unless the record has one.
///
/// # Errors
/// The first fault, with the file and the place in it.
pub fn read_file(path: &Path) -> Result<Material, Box<Diagnostic>> {
    let bytes = std::fs::read(path).map_err(|error| of_file(path, &error.to_string()))?;
    let text = String::from_utf8(bytes).map_err(|_| of_file(path, "the file is not UTF-8 text"))?;
    let stem = path.file_stem().unwrap_or_default().to_string_lossy();
    read(&text, &stem, Origin::File(path.to_path_buf())).map_err(|fault| Box::new(fault.in_file(path)))
}

fn of_file(path: &Path, reason: &str) -> Box<Diagnostic> {
    Box::new(Diagnostic::new(format!("cannot read the material file: {reason}")).in_file(path))
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

#[cfg(test)]
mod tests {
    use super::*;

    const DEMO: &str = "kind: ductile
youngs_modulus: {value: 210 GPa, source: invented}
poisson: 0.3
density: 7850 kg/m3
expansion: {means: [[100 degC, 12e-6 /K], [200 degC, 13e-6 /K]]}
strength:
  - {section_up_to: 16 mm, yield_strength: 340 MPa, tensile_strength: 620 MPa}
  - {section_up_to: 100 mm, yield_strength: 305 MPa, tensile_strength: 580 MPa}
";

    const TABLE: &str = "{means: [[100 degC, 12e-6 /K], [200 degC, 13e-6 /K]]}";

    fn with_expansion(expansion: &str) -> Result<Material, Box<Diagnostic>> {
        read(&DEMO.replacen(TABLE, expansion, 1), "demo", Origin::JointFile)
    }

    /// The fault after `from` became `to`: the message, and the text under the caret.
    fn fault(from: &str, to: &str) -> (String, String) {
        assert!(DEMO.contains(from), "{from}");
        let text = DEMO.replacen(from, to, 1);
        let diagnostic = read(&text, "demo", Origin::JointFile).unwrap_err();
        let (place, line) = (diagnostic.place.unwrap(), diagnostic.line_text.unwrap());
        assert_eq!(text.lines().nth(place.line - 1), Some(line.as_str()));
        let meant = line.chars().skip(place.column - 1).take(diagnostic.width).collect();
        (diagnostic.message, meant)
    }

    fn help(from: &str, to: &str) -> Option<String> {
        read(&DEMO.replacen(from, to, 1), "demo", Origin::JointFile).unwrap_err().help
    }

    #[test]
    fn the_demo_record_is_sound() {
        let material = read(DEMO, "demo", Origin::JointFile).unwrap();
        assert_eq!(material.id, "demo");
        assert_eq!(&*material.poisson.source, "no source given");
    }

    #[test]
    fn faults_of_a_value_stand_under_the_value() {
        for (from, to, message, meant) in [
            ("0.3", "0.5", "Poisson's ratio must lie between -1 and 0.5, not 0.5", "0.5"),
            ("210 GPa", "-1 GPa", "youngs_modulus must be greater than zero", "{value"),
            ("7850", "0", "density must be greater than zero", "0 kg/m3"),
            ("340 MPa", "700 MPa", "yield_strength is greater than tensile_strength", "700 MPa"),
            ("620 MPa", "0 MPa", "tensile_strength must be greater than zero", "0 MPa"),
            ("100 mm", "16 mm", "sections must rise from row to row", "{section_up_to"),
            ("[200 degC", "[90 degC", "temperatures must rise from point to point", "[90 degC"),
            ("13e-6", "5e-6", "the part does not grow from this point to the next when heated", "[200 degC"),
            ("100 degC", "-300 degC", "below absolute zero", "-300 degC"),
        ] {
            let found = fault(from, to);
            assert!(found.0.contains(message) && found.1 == meant, "{to}: {found:?}");
        }
    }

    #[test]
    fn faults_of_a_key_stand_under_the_key() {
        assert_eq!(fault("poisson", "poison"), ("unknown key `poison`".into(), "poison".into()));
        assert_eq!(help("poisson", "poison").as_deref(), Some("did you mean `poisson`?"));
        assert_eq!(fault("value:", "vaule:"), ("unknown key `vaule`".into(), "vaule".into()));
        assert_eq!(fault("ductile", "ductil"), ("unknown word `ductil`".into(), "ductil".into()));
        assert_eq!(fault("density: 7850 kg/m3\n", "").0, "missing key `density`");
    }

    #[test]
    fn a_number_without_its_unit_stands_under_the_number() {
        let (message, meant) = fault("210 GPa", "210");
        assert!(message.contains("210") && meant == "210", "{message}");
        let (message, meant) = fault(TABLE, "12e-6");
        assert!(message.contains("unit") && meant == "12e-6", "{message}");
    }

    #[test]
    fn a_curve_that_is_not_known_is_mended() {
        assert_eq!(fault(TABLE, "ferittic steel").1, "ferittic steel");
        assert_eq!(help(TABLE, "ferittic steel").as_deref(), Some("did you mean `ferritic steel`?"));
    }

    #[test]
    fn a_mean_coefficient_has_a_range() {
        let with = with_expansion;
        let plain = with("12e-6 /K").unwrap().expansion;
        assert_eq!(plain.range(), (223.15, 623.15));
        assert!((plain.strain(323.15).unwrap() - 3.6e-4).abs() < 1e-15);
        assert!(plain.strain(194.65).is_err(), "dry ice is colder than a mean coefficient holds");
        let stated = with("{mean: 12e-6 /K, to: 600 degC}").unwrap().expansion;
        assert_eq!(stated.range(), (223.15, 873.15));
        assert!(with("{mean: 12e-6 /K, from: 50 degC}").is_err());
        assert!(with("{mean: 12e-6 /K, means: [[100 degC, 12e-6 /K]]}").is_err());
        assert!(with("{source: empty}").is_err());
        assert!(with("12 /K").is_err());
    }

    #[test]
    fn tables_pass_zero_at_20_degrees() {
        let with = with_expansion;
        let joined = with("{cold: ferritic steel, means: [[100 degC, 12e-6 /K]]}").unwrap().expansion;
        assert!(joined.points().contains(&(293.15, 0.0)));
        assert!((joined.range().0 - 77.0).abs() < 1e-9 && joined.range().1 == 373.15);
        assert!(with("{curve: [[20 degC, 1e-5], [100 degC, 1e-3]]}").is_err());
        assert!(with("{curve: [[-40 degC, 1e-5], [100 degC, -1e-3]], monotone: false}").is_ok());
    }

    #[test]
    fn a_table_of_mean_coefficients_is_not_read_as_one_of_slopes() {
        let text = DEMO
            .replace("100 degC, 12e-6", "120 degC, 12.4e-6")
            .replace("200 degC, 13e-6", "220 degC, 12.9e-6");
        let expansion = read(&text, "demo", Origin::JointFile).unwrap().expansion;
        // By hand, ᾱ linear from 120 to 220 °C: 12.65e-6 · 150 = 1.8975e-3. Read as slopes the table would
        // give 12.4e-6 · 100 + 12.525e-6 · 50 = 1.866e-3.
        assert!((expansion.strain(443.15).unwrap() - 1.8975e-3).abs() < 1e-6);
    }

    #[test]
    fn a_byte_order_mark_and_other_line_ends_are_no_fault() {
        assert!(read(&format!("\u{feff}{DEMO}"), "demo", Origin::JointFile).is_ok());
        assert!(read(&DEMO.replace('\n', "\r\n"), "demo", Origin::JointFile).is_ok());
    }

    #[test]
    fn a_file_that_is_too_large_is_refused_at_once() {
        let text = "[".repeat(LARGEST_FILE + 1);
        assert!(read(&text, "demo", Origin::JointFile).unwrap_err().message.contains("1 MiB"));
    }

    #[test]
    fn strength_is_given_once_and_for_the_kind() {
        let (message, _) = fault("poisson", "yield_strength: 300 MPa\npoisson");
        assert_eq!(message, "strength is given twice");
        let (message, meant) = fault("yield_strength: 340 MPa, ", "");
        assert!(message.contains("needs its yield_strength") && meant.starts_with("{section"), "{message}");
    }
}
