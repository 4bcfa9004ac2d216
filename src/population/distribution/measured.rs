//! Measured parts from a CSV file.
//!
//! The first row names the columns. The column of sizes is `size`, `diameter` or `value`; its unit stands in the
//! header, `diameter_mm`, `diameter [mm]` or `diameter (mm)`, or behind each number. A column `part`, `name` or
//! `id` names the parts; without it they go by their number. Columns are parted by `,`, `;` or a tab, whichever the
//! first row has; where it is not `,`, a decimal comma is read too.

use crate::diagnostic::Diagnostic;
use crate::quantity::{self, Kind};

/// One measured part.
#[derive(Debug, Clone, PartialEq)]
pub struct Part {
    /// Its name.
    pub name: String,
    /// Its size, SI.
    pub value: f64,
}

/// Most parts that are read.
pub const MOST_PARTS: usize = 1_000_000;

/// Reads measured parts.
///
/// # Errors
/// No column of sizes, a cell that is no quantity of the kind (with its line), no parts, too many.
///
/// # Example
/// ```
/// use hubgrip::population::distribution::measured::read;
/// use hubgrip::quantity::Kind;
/// let parts = read("part,diameter_mm\nA1,60.012\nA2,60.009\n", Kind::Length)?;
/// assert_eq!((parts[1].name.as_str(), parts[1].value), ("A2", 0.060009));
/// # Ok::<(), Box<hubgrip::diagnostic::Diagnostic>>(())
/// ```
pub fn read(text: &str, kind: Kind) -> Result<Vec<Part>, Box<Diagnostic>> {
    let text = text.strip_prefix('\u{feff}').unwrap_or(text);
    let separator = separator(text);
    let mut table = csv::ReaderBuilder::new()
        .trim(csv::Trim::All)
        .comment(Some(b'#'))
        .delimiter(separator)
        .from_reader(text.as_bytes());
    let header = table.headers().map_err(|error| unreadable(&error))?.clone();
    let (column, unit) =
        header.iter().enumerate().find_map(|(index, name)| Some((index, size_column(name)?))).ok_or_else(
            || {
                Box::new(
                    Diagnostic::new("no column of sizes is found in the first row")
                        .with_help("name it `diameter_mm`, or `diameter` with the unit behind each number"),
                )
            },
        )?;
    let named = header.iter().position(|name| ["part", "name", "id"].contains(&plain(name).as_str()));
    let mut parts = Vec::new();
    for (number, row) in table.records().enumerate() {
        let row = row.map_err(|error| unreadable(&error))?;
        let line = row.position().map_or(0, csv::Position::line);
        let cell = row.get(column).unwrap_or("");
        let cell = if separator == b',' { cell.to_owned() } else { cell.replace(',', ".") };
        let written = match &unit {
            Some(unit) => format!("{cell} {unit}"),
            None => cell,
        };
        let value = quantity::parse(kind, written.trim()).map_err(|error| {
            let fault = Diagnostic::new(format!("line {line}: {error}"));
            Box::new(match error.help() {
                Some(help) => fault.with_help(help),
                None => fault,
            })
        })?;
        let name = named.and_then(|named| row.get(named)).filter(|name| !name.is_empty());
        let name = name.map_or_else(|| (number + 1).to_string(), str::to_owned);
        parts.push(Part { name, value });
        if parts.len() > MOST_PARTS {
            return Err(Box::new(Diagnostic::new(format!("there are more than {MOST_PARTS} parts"))));
        }
    }
    if parts.is_empty() {
        return Err(Box::new(Diagnostic::new("there is no part under the first row")));
    }
    Ok(parts)
}

/// What parts the columns of the first row that is neither blank nor a comment.
fn separator(text: &str) -> u8 {
    let first = text.lines().map(str::trim).find(|line| !line.is_empty() && !line.starts_with('#'));
    let has = |character: char| first.is_some_and(|line| line.contains(character));
    match (has(';'), has('\t')) {
        (true, _) => b';',
        (false, true) => b'\t',
        (false, false) => b',',
    }
}

fn plain(name: &str) -> String {
    name.trim().to_lowercase()
}

/// Unit of a column of sizes, when the header has one; none when it is no such column.
fn size_column(name: &str) -> Option<Option<String>> {
    let name = name.trim();
    let rest = ["size", "diameter", "value"].into_iter().find_map(|word| {
        name.get(..word.len()).filter(|start| start.eq_ignore_ascii_case(word))?;
        name.get(word.len()..)
    })?;
    let unit = rest.trim_matches(|c: char| c.is_whitespace() || "_[]()".contains(c));
    if rest.starts_with(char::is_alphanumeric) {
        return None;
    }
    Some((!unit.is_empty()).then(|| unit.to_owned()))
}

fn unreadable(error: &csv::Error) -> Box<Diagnostic> {
    let line = error.position().map_or(0, csv::Position::line);
    Box::new(match error.kind() {
        csv::ErrorKind::UnequalLengths { expected_len, len, .. } => {
            Diagnostic::new(format!("line {line}: the row has {len} cells, the first row has {expected_len}"))
                .with_help("write decimal points, or part the columns by `;`: a comma parts them here")
        }
        _ => Diagnostic::new(format!("this is not a table in CSV: {error}")),
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn units_stand_in_the_header_or_in_the_cells() {
        for text in [
            "part,diameter_mm\nA,60.01\n",
            "part,Diameter [mm]\nA,60.01\n",
            "name,size\nA,60.01 mm\n",
            "# bench 4\nid,value (um)\nA,60010\n",
            "\u{feff}part;diameter_mm\r\nA;60,01\r\n",
            "\"part\"\t\"size\"\nA\t\"60,01 mm\"\n",
            "part,diameter_mm\nA,\"60.01\"\n",
        ] {
            let parts = read(text, Kind::Length).unwrap();
            assert_eq!(parts, [Part { name: "A".into(), value: 0.06001 }], "{text}");
        }
        assert_eq!(read("value\n0.12\n", Kind::Number).unwrap()[0].name, "1");
    }

    #[test]
    fn faults_name_the_line() {
        let fault = read("size_mm\n60.01\nsixty\n", Kind::Length).unwrap_err();
        assert!(fault.message.starts_with("line 3: "), "{fault}");
        let fault = read("size\n60.01\n", Kind::Length).unwrap_err();
        assert!(fault.message.contains("has no unit"), "{fault}");
        let fault = read("size_mm\n60,01\n", Kind::Length).unwrap_err();
        assert!(fault.message.starts_with("line 2: the row has 2 cells"), "{fault}");
        assert!(fault.help.unwrap().contains("decimal points"));
        assert!(read("length_mm\n60\n", Kind::Length).is_err());
        assert!(read("size_mm\n", Kind::Length).is_err());
    }
}
