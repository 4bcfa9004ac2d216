//! The header of a record: which column is the travel, which the force, in what units, what parts them.

use crate::diagnostic::{Diagnostic, Place, did_you_mean};
use crate::quantity::{self, Kind};

/// Words that name a column of travel.
pub const TRAVEL_WORDS: [&str; 5] = ["travel", "position", "stroke", "displacement", "path"];

/// Words that name a column of force.
pub const FORCE_WORDS: [&str; 2] = ["force", "load"];

/// A column that was found.
#[derive(Debug, Clone, PartialEq)]
pub struct Column {
    /// Its number from 0.
    pub index: usize,
    /// Its name as written.
    pub name: String,
    /// Its unit as written.
    pub unit: String,
    /// Size of the unit in SI.
    pub scale: f64,
}

/// The header as understood.
#[derive(Debug, Clone, PartialEq)]
pub struct Columns {
    /// What parts the columns: `,`, `;` or a tab.
    pub separator: u8,
    /// Travel.
    pub travel: Column,
    /// Force.
    pub force: Column,
}

/// A field of a line: its text and its first character, counted from 1.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) struct Field<'a> {
    pub(super) text: &'a str,
    pub(super) column: usize,
}

impl Field<'_> {
    fn width(&self) -> usize {
        self.text.chars().count().max(1)
    }
}

/// The fields of a line; a separator between quotes parts nothing. Blanks and quotes round a field are dropped.
pub(super) fn fields(line: &str, separator: u8) -> impl Iterator<Item = Field<'_>> {
    let mut rest = Some((line, 1));
    std::iter::from_fn(move || {
        let (text, column) = rest?;
        let mut quoted = false;
        let end = text.bytes().position(|byte| {
            quoted ^= byte == b'"';
            byte == separator && !quoted
        });
        let whole = &text[..end.unwrap_or(text.len())];
        rest = end.map(|end| (&text[end + 1..], column + whole.chars().count() + 1));
        let trimmed = whole.trim_start_matches([' ', '\t', '"']);
        let before = whole.chars().count() - trimmed.chars().count();
        Some(Field { text: trimmed.trim_end_matches([' ', '\t', '"']), column: column + before })
    })
}

/// What parts the columns of a header: a semicolon if there is one, else a tab, else a comma.
fn separator(line: &str) -> u8 {
    [b';', b'\t'].into_iter().find(|separator| line.bytes().any(|byte| byte == *separator)).unwrap_or(b',')
}

/// Whether a line names a travel, and a force.
pub(super) fn named(line: &str) -> (bool, bool) {
    let separator = separator(line);
    let names = |words: &[&str]| fields(line, separator).any(|field| has_word(field.text, words));
    (names(&TRAVEL_WORDS), names(&FORCE_WORDS))
}

/// Reads a header line.
///
/// A column is found by a word of its name: [`TRAVEL_WORDS`], [`FORCE_WORDS`]; case does not matter. Its unit stands
/// behind the name, `travel (mm)`, `force [kN]`, `travel_mm`, `force / kN` or `position in mm`.
///
/// # Errors
/// A column that is missing or there twice, a unit that is missing, unknown or of something else.
///
/// # Example
/// ```
/// use hubgrip::pressing::columns::columns;
/// let found = columns("time [s];Ram position (mm);Press force [kN]", 1)?;
/// assert_eq!((found.separator, found.travel.index, found.force.scale), (b';', 1, 1e3));
/// # Ok::<(), Box<hubgrip::diagnostic::Diagnostic>>(())
/// ```
pub fn columns(line: &str, number: usize) -> Result<Columns, Box<Diagnostic>> {
    let separator = separator(line);
    let all: Vec<Field<'_>> = fields(line, separator).collect();
    let header = Header { line, number, fields: &all };
    Ok(Columns {
        separator,
        travel: header.column("travel", &TRAVEL_WORDS, Kind::Length, "travel (mm)")?,
        force: header.column("force", &FORCE_WORDS, Kind::Force, "force (kN)")?,
    })
}

struct Header<'a> {
    line: &'a str,
    number: usize,
    fields: &'a [Field<'a>],
}

impl Header<'_> {
    fn column(
        &self,
        what: &str,
        words: &[&str],
        kind: Kind,
        example: &str,
    ) -> Result<Column, Box<Diagnostic>> {
        let found: Vec<(usize, &Field<'_>)> =
            self.fields.iter().enumerate().filter(|(_, field)| has_word(field.text, words)).collect();
        match found.as_slice() {
            [] => Err(self.missing(what, words, example)),
            [(index, field)] => self.with_unit(*index, field, kind, example),
            [_, (_, second), ..] => {
                let fault = self.fault(second, format!("two columns name a {what}"));
                Err(Box::new(
                    fault.with_help(format!("keep one column with the word `{}`", words.join("` or `"))),
                ))
            }
        }
    }

    fn missing(&self, what: &str, words: &[&str], example: &str) -> Box<Diagnostic> {
        let whole = Field { text: self.line.trim(), column: 1 };
        let near = self.fields.iter().find_map(|field| {
            field.text.split(|c: char| !c.is_alphabetic()).find_map(|word| {
                did_you_mean(word, words.iter().copied()).filter(|_| word.chars().count() > 3)
            })
        });
        let help = match near {
            Some(near) => format!("did you mean `{near}`? Name the column such as `{example}`"),
            None => format!("name a column with one of the words {}, such as `{example}`", words.join(", ")),
        };
        Box::new(self.fault(&whole, format!("no column of {what} is found in the header")).with_help(help))
    }

    fn with_unit(
        &self,
        index: usize,
        field: &Field<'_>,
        kind: Kind,
        example: &str,
    ) -> Result<Column, Box<Diagnostic>> {
        let Some(unit) = unit(field.text, kind) else {
            let fault = self.fault(field, format!("the column `{}` has no unit", field.text));
            return Err(Box::new(
                fault.with_help(format!("put the unit behind the name, such as `{example}`")),
            ));
        };
        match quantity::parse(kind, &format!("1 {unit}")) {
            Ok(scale) => Ok(Column { index, name: field.text.to_owned(), unit: unit.to_owned(), scale }),
            Err(error) => {
                let fault = self.fault(field, format!("the unit of column `{}`: {error}", field.text));
                let names = format!("the units of {} are {}", kind.phrase(), kind.unit_names());
                Err(Box::new(fault.with_help(error.help().unwrap_or(names))))
            }
        }
    }

    fn fault(&self, field: &Field<'_>, message: String) -> Diagnostic {
        let mut fault = Diagnostic::new(message);
        fault.place = Some(Place { line: self.number, column: field.column });
        fault.line_text = Some(self.line.to_owned());
        fault.width = field.width();
        fault
    }
}

/// Whether one of the words of a name is one of these.
fn has_word(name: &str, words: &[&str]) -> bool {
    name.split(|c: char| !c.is_alphanumeric())
        .any(|part| words.iter().any(|word| part.eq_ignore_ascii_case(word)))
}

/// The unit in a name: between brackets, behind a stroke, or the last word when it is a unit.
fn unit(name: &str, kind: Kind) -> Option<&str> {
    if let Some(open) = name.find(['(', '[', '{']) {
        let rest = &name[open + 1..];
        let close = rest.find([')', ']', '}']).unwrap_or(rest.len());
        return Some(rest[..close].trim()).filter(|unit| !unit.is_empty());
    }
    if let Some((_, unit)) = name.split_once('/') {
        return Some(unit.trim()).filter(|unit| !unit.is_empty());
    }
    let (_, last) = name.rsplit_once([' ', '_'])?;
    let behind_in = name.rsplit([' ', '_']).nth(1).is_some_and(|word| word.eq_ignore_ascii_case("in"));
    let known = |kind| quantity::parse(kind, &format!("1 {last}")).is_ok();
    (behind_in || known(kind) || known(Kind::Mass) || known(Kind::Pressure)).then_some(last)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn faulty(line: &str) -> (String, usize, String) {
        let fault = columns(line, 3).unwrap_err();
        (fault.message.clone(), fault.place.unwrap().column, fault.help.clone().unwrap())
    }

    #[test]
    fn units_stand_in_many_ways() {
        for (header, travel, force) in [
            ("travel (mm),force (kN)", 1e-3, 1e3),
            ("time;Stroke [in];Load [lbf]", 0.0254, 4.4482216152605),
            ("position_um\tforce_N", 1e-6, 1.0),
            ("n,\"displacement / mm\",\"Force in MN\"", 1e-3, 1e6),
            ("path µm, load kip", 1e-6, 4448.2216152605),
        ] {
            let found = columns(header, 1).unwrap_or_else(|fault| panic!("{header}: {fault}"));
            approx::assert_relative_eq!(found.travel.scale, travel, max_relative = 1e-14);
            approx::assert_relative_eq!(found.force.scale, force, max_relative = 1e-14);
        }
    }

    #[test]
    fn faults_point_at_the_column() {
        let (message, column, help) = faulty("travel (mm),torque (N.m)");
        assert_eq!((message.as_str(), column), ("no column of force is found in the header", 1));
        assert!(help.contains("force, load") && help.contains("`force (kN)`"), "{help}");
        let (message, column, help) = faulty("travel (mm),force");
        assert_eq!((message.as_str(), column), ("the column `force` has no unit", 13));
        assert!(help.contains("`force (kN)`"), "{help}");
        let (message, column, help) = faulty("travel (mm),force (kg)");
        assert!(message.contains("force (kg)") && column == 13 && !help.is_empty(), "{message} {help}");
        let (message, _, help) = faulty("travel (mmm);force (N)");
        assert!(message.contains("mmm") && help.contains("mm"), "{message} {help}");
        let (message, column, _) = faulty("travel (mm);force (N);set force (N)");
        assert_eq!((message.as_str(), column), ("two columns name a force", 23));
        let (_, _, help) = faulty("travle (mm);force (N)");
        assert!(help.starts_with("did you mean `travel`?"), "{help}");
    }

    #[test]
    fn fields_keep_their_place() {
        let found: Vec<(usize, &str)> =
            fields("\"a;b\" ;  1.5;é;x", b';').map(|field| (field.column, field.text)).collect();
        assert_eq!(found, [(2, "a;b"), (10, "1.5"), (14, "é"), (16, "x")]);
    }
}
