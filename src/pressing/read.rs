//! A record read row by row: CSV with a header, in bounded memory.

use std::io::{self, BufRead};

use super::columns::{self, Columns, Field, fields};
use super::trace::{Point, Trace};
use crate::diagnostic::{Diagnostic, Place};

/// Fewest rows that make a curve (common practice, no source).
pub const FEWEST_ROWS: u64 = 20;

/// Longest line that is read, bytes.
const LONGEST_LINE: u64 = 65_536;

/// Lines before the header that may hold anything else, such as the name of the press.
const MOST_LINES_BEFORE_HEADER: usize = 50;

/// A record as read.
#[derive(Debug, Clone, PartialEq)]
pub struct Record {
    /// The header as understood.
    pub columns: Columns,
    /// Number of rows.
    pub rows: u64,
    /// The curve in bins, in order of travel; m and N.
    pub points: Vec<Point>,
    /// Greatest single reading, N, with its travel, m.
    pub greatest: (f64, f64),
}

/// Reads a record: a header line, then one row a line with a travel that never goes back.
///
/// A byte-order mark, blank lines and lines that begin with `#` are passed over, and so are up to 50 lines before the
/// header. Columns are parted by `;`, a tab or `,`, whichever the header has; where it is not `,`, a decimal comma
/// is read too. Rows may stand at the same travel. Nothing is skipped: a row that cannot be read is an error.
///
/// # Errors
/// A [`Diagnostic`] with line and column: no header, a column or unit that is missing or unknown, a cell that is not a
/// finite number, a travel that goes back, fewer than [`FEWEST_ROWS`] rows, or a file that cannot be read.
///
/// # Example
/// ```
/// let mut text = "# press 4\ntravel (mm),force (kN)\n".to_owned();
/// (0..50).for_each(|row| text.push_str(&format!("{row},{}\n", f64::from(row) * 0.5)));
/// let record = hubgrip::pressing::read(text.as_bytes())?;
/// assert_eq!((record.rows, record.greatest.0), (50, 24_500.0));
/// # Ok::<(), Box<hubgrip::diagnostic::Diagnostic>>(())
/// ```
pub fn read(source: impl BufRead) -> Result<Record, Box<Diagnostic>> {
    let mut lines = Lines { source, number: 0, buffer: Vec::new() };
    let columns = header(&mut lines)?;
    let mut rows = Rows::new(columns);
    while let Some(line) = lines.next()? {
        rows.take(line)?;
    }
    rows.finish(lines.number)
}

struct Line<'a> {
    bytes: &'a [u8],
    number: usize,
}

struct Lines<R> {
    source: R,
    number: usize,
    buffer: Vec<u8>,
}

impl<R: BufRead> Lines<R> {
    /// The next line that is neither blank nor a comment, without its end.
    fn next(&mut self) -> Result<Option<Line<'_>>, Box<Diagnostic>> {
        loop {
            self.buffer.clear();
            let mut limited = io::Read::take(&mut self.source, LONGEST_LINE);
            let read = limited
                .read_until(b'\n', &mut self.buffer)
                .map_err(|error| Box::new(Diagnostic::new(format!("cannot read: {error}"))))?;
            if read == 0 {
                return Ok(None);
            }
            self.number += 1;
            if read as u64 == LONGEST_LINE && self.buffer.last() != Some(&b'\n') {
                let fault =
                    at(Line { bytes: b"", number: self.number }, 1, 1, "this line is longer than 64 KiB");
                return Err(Box::new(fault.with_help("a record has one row a line, in text")));
            }
            if self.number == 1 {
                self.check_encoding()?;
            }
            while self.buffer.last().is_some_and(u8::is_ascii_whitespace) {
                self.buffer.pop();
            }
            let first = self.buffer.iter().find(|byte| !byte.is_ascii_whitespace());
            if first.is_some_and(|byte| *byte != b'#') {
                break;
            }
        }
        Ok(Some(Line { bytes: &self.buffer, number: self.number }))
    }

    /// Drops a byte-order mark; refuses UTF-16.
    fn check_encoding(&mut self) -> Result<(), Box<Diagnostic>> {
        if self.buffer.starts_with(&[0xEF, 0xBB, 0xBF]) {
            self.buffer.drain(..3);
        } else if self.buffer.starts_with(&[0xFF, 0xFE]) || self.buffer.starts_with(&[0xFE, 0xFF]) {
            let fault = Diagnostic::new("this is text in UTF-16, not UTF-8");
            return Err(Box::new(fault.with_help("save the record as CSV in UTF-8")));
        }
        Ok(())
    }
}

fn header<R: BufRead>(lines: &mut Lines<R>) -> Result<Columns, Box<Diagnostic>> {
    let mut blamed: Option<(bool, String, usize)> = None;
    for _ in 0..=MOST_LINES_BEFORE_HEADER {
        let Some(line) = lines.next()? else { break };
        let text = String::from_utf8_lossy(line.bytes).into_owned();
        let named = columns::named(&text);
        if named == (true, true) {
            return columns::columns(&text, line.number);
        }
        let half = named.0 || named.1;
        if blamed.as_ref().is_none_or(|(blamed_half, ..)| half && !blamed_half) {
            blamed = Some((half, text, line.number));
        }
    }
    match blamed {
        Some((_, text, number)) => columns::columns(&text, number),
        None => {
            Err(Box::new(Diagnostic::new("the record is empty").with_help(
                "a record is CSV with a header such as `travel (mm),force (kN)` and one row a line",
            )))
        }
    }
}

/// A field with its value, SI.
type Cell<'t> = (Field<'t>, f64);

/// The rows taken so far.
struct Rows {
    columns: Columns,
    last: f64,
    count: u64,
    trace: Trace,
    first: f64,
    greatest: (f64, f64),
}

impl Rows {
    fn new(columns: Columns) -> Self {
        Self {
            columns,
            last: f64::NEG_INFINITY,
            count: 0,
            trace: Trace::default(),
            first: 0.0,
            greatest: (f64::NEG_INFINITY, 0.0),
        }
    }

    fn take(&mut self, line: Line<'_>) -> Result<(), Box<Diagnostic>> {
        let Ok(text) = std::str::from_utf8(line.bytes) else { return self.take_lossy(&line) };
        let [travel, force] = self.cells(text, line.number)?;
        if travel.1 < self.last {
            let scale = self.columns.travel.scale;
            let message = format!(
                "the travel goes back from {} to {} {}",
                crate::quantity::number(self.last / scale, 9),
                travel.0.text,
                self.columns.travel.unit
            );
            let fault = at(line, travel.0.column, travel.0.text.chars().count(), &message);
            return Err(Box::new(
                fault.with_help("end the record where the ram stops; leave out the return stroke"),
            ));
        }
        if self.count == 0 {
            self.first = travel.1;
        }
        self.last = travel.1;
        self.count += 1;
        if force.1 > self.greatest.0 {
            self.greatest = (force.1, travel.1);
        }
        self.trace.push(travel.1, force.1);
        Ok(())
    }

    /// A line with bytes that are not UTF-8, such as a remark in another code page: the numbers may still be read.
    fn take_lossy(&mut self, line: &Line<'_>) -> Result<(), Box<Diagnostic>> {
        let text = String::from_utf8_lossy(line.bytes).into_owned();
        self.take(Line { bytes: text.as_bytes(), number: line.number })
    }

    /// Travel and force of a row, SI, with their fields.
    fn cells<'t>(&self, text: &'t str, number: usize) -> Result<[Cell<'t>; 2], Box<Diagnostic>> {
        let columns = &self.columns;
        let (mut travel, mut force) = (None, None);
        for (index, field) in fields(text, columns.separator).enumerate() {
            if index == columns.travel.index {
                travel = Some(field);
            }
            if index == columns.force.index {
                force = Some(field);
            }
        }
        let value = |field: Option<Field<'t>>, column: &columns::Column| {
            let Some(field) = field else {
                let message = format!("this row has no column {} (`{}`)", column.index + 1, column.name);
                return Err(Box::new(at(
                    Line { bytes: text.as_bytes(), number },
                    1,
                    text.chars().count(),
                    &message,
                )));
            };
            match decimal(field.text, columns.separator) {
                Some(value) if (value * column.scale).is_finite() => Ok((field, value * column.scale)),
                _ => Err(not_a_number(field, column, text, number)),
            }
        };
        Ok([value(travel, &columns.travel)?, value(force, &columns.force)?])
    }

    fn finish(self, lines: usize) -> Result<Record, Box<Diagnostic>> {
        if self.count == 0 {
            let mut fault = Diagnostic::new("there is no row under the header");
            fault.place = Some(Place { line: lines.max(1), column: 1 });
            return Err(Box::new(fault.with_help("a record has one row a line under its header")));
        }
        let end = |message: String| {
            let mut fault = Diagnostic::new(message);
            fault.place = Some(Place { line: lines, column: 1 });
            fault
        };
        if self.count < FEWEST_ROWS {
            let fault =
                end(format!("the record has {} rows; a curve needs {FEWEST_ROWS} or more", self.count));
            return Err(Box::new(fault.with_help("record more points along the travel")));
        }
        if self.last <= self.first {
            let fault = end("the travel does not increase: every row stands at the same place".to_owned());
            return Err(Box::new(fault.with_help("the column of travel must be that of the ram")));
        }
        Ok(Record {
            columns: self.columns,
            rows: self.count,
            points: self.trace.points(),
            greatest: self.greatest,
        })
    }
}

/// A finite decimal number; with a decimal comma where the comma does not part columns.
fn decimal(text: &str, separator: u8) -> Option<f64> {
    if !text.bytes().all(|byte| byte.is_ascii_digit() || b"+-.,eE".contains(&byte)) {
        return None;
    }
    let value: f64 = match text.parse() {
        Ok(value) => value,
        Err(_) if separator != b',' && !text.contains('.') => text.replacen(',', ".", 1).parse().ok()?,
        Err(_) => return None,
    };
    value.is_finite().then_some(value)
}

fn not_a_number(field: Field<'_>, column: &columns::Column, text: &str, number: usize) -> Box<Diagnostic> {
    let line = Line { bytes: text.as_bytes(), number };
    if field.text.is_empty() {
        let fault = at(line, field.column, 1, &format!("there is no number in column `{}`", column.name));
        return Box::new(fault.with_help("leave out a row without a reading, or mend it"));
    }
    let message = format!("`{}` in column `{}` is not a finite number", field.text, column.name);
    let fault = at(line, field.column, field.text.chars().count(), &message);
    Box::new(fault.with_help("write a decimal number such as 12.5, without its unit"))
}

fn at(line: Line<'_>, column: usize, width: usize, message: &str) -> Diagnostic {
    let mut fault = Diagnostic::new(message);
    fault.place = Some(Place { line: line.number, column });
    fault.line_text = Some(String::from_utf8_lossy(line.bytes).into_owned()).filter(|text| !text.is_empty());
    fault.width = width.max(1);
    fault
}

#[cfg(test)]
mod tests {
    use super::*;

    fn body(separator: char, comma: bool) -> String {
        (0..30)
            .map(|row| {
                let line = format!("{row}.5{separator}{}.25\n", 2 * row);
                if comma { line.replace('.', ",") } else { line }
            })
            .collect()
    }

    fn faulty(text: &str) -> (String, Option<(usize, usize)>) {
        let fault = read(text.as_bytes()).unwrap_err();
        (fault.message.clone(), fault.place.map(|place| (place.line, place.column)))
    }

    #[test]
    fn separators_comments_marks_and_commas() {
        let plain = read(format!("travel (mm),force (kN)\n{}", body(',', false)).as_bytes()).unwrap();
        for text in [
            format!("\u{feff}# made by hand\r\n\r\ntravel (mm);force (kN)\r\n# begin\r\n{}", body(';', true)),
            format!("press 4;line 2\n\ntravel (mm)\tforce (kN)\n{}", body('\t', false)),
        ] {
            let record = read(text.as_bytes()).unwrap_or_else(|fault| panic!("{fault}\n{text}"));
            assert_eq!((record.rows, &record.points), (30, &plain.points));
        }
        assert_eq!(plain.greatest.0, 58_250.0);
        assert!((plain.greatest.1 - 0.0295).abs() < 1e-15);
    }

    #[test]
    fn bad_rows_are_told_with_their_place() {
        let head = "travel (mm),force (kN)\n";
        let good = body(',', false);
        for (text, message, place) in [
            (
                format!("{head}{good}30.1,nan\n"),
                "`nan` in column `force (kN)` is not a finite number",
                (32, 6),
            ),
            (format!("{head}{good}31,1e400\n"), "`1e400` in column", (32, 4)),
            (format!("{head}{good}28.5,3\n"), "the travel goes back from 29.5 to 28.5 mm", (32, 1)),
            (format!("{head}{good}31,\n"), "there is no number in column `force (kN)`", (32, 4)),
            (format!("{head}{good}31\n"), "this row has no column 2 (`force (kN)`)", (32, 1)),
            (format!("{head}{good}31 mm,5\n"), "`31 mm` in column `travel (mm)`", (32, 1)),
            (head.to_owned(), "there is no row under the header", (1, 1)),
            (format!("{head}1,2\n2,3\n"), "the record has 2 rows; a curve needs 20 or more", (3, 1)),
            (format!("{head}{}", "1,2\n".repeat(30)), "the travel does not increase", (31, 1)),
        ] {
            let (told, at) = faulty(&text);
            assert!(told.starts_with(message), "{told}\n{message}");
            assert_eq!(at, Some(place), "{told}");
        }
    }

    #[test]
    fn what_is_no_record_is_refused() {
        assert_eq!(faulty("").0, "the record is empty");
        assert_eq!(faulty("# only this\n").0, "the record is empty");
        assert_eq!(faulty("1,2\n3,4\n").0, "no column of travel is found in the header");
        assert!(read(&[0xFF, 0xFE, b't', 0][..]).unwrap_err().message.contains("UTF-16"));
        assert!(read("x".repeat(100_000).as_bytes()).unwrap_err().message.contains("64 KiB"));
    }
}
