//! A table streamed: blocks of rows read, worked out on all cores, written in their order.

use std::cell::RefCell;
use std::collections::VecDeque;
use std::io::{self, Read, Write};
use std::rc::Rc;

use csv::ByteRecord;
use rayon::prelude::*;

use super::outcome::{OutputColumn, Value};
use super::row::{Rows, Worker};
use super::{BatchError, Progress, Summary};

/// Rows of a block; memory is that of two blocks, whatever the length of the table.
const BLOCK: usize = 4096;
/// Rows that one worker takes at a time.
const CHUNK: usize = 128;
/// Longest row, bytes; beyond it a quote was not closed.
const LONGEST_ROW: usize = 1 << 20;

/// Where a table goes.
pub(super) struct Sinks<'a> {
    pub(super) output: &'a mut (dyn Write + 'a),
    /// Where rows with errors go instead of a column.
    pub(super) errors: Option<&'a mut (dyn Write + 'a)>,
}

/// What a chunk of rows has become.
#[derive(Default)]
struct Worked {
    output: Vec<u8>,
    errors: Vec<u8>,
    summary: Summary,
}

/// What a reader has let through.
#[derive(Default)]
struct Passed {
    bytes: u64,
    bytes_since_row: usize,
    /// Places of the line feeds that no row has been found behind yet.
    line_feeds: VecDeque<u64>,
    lines: u64,
}

impl Passed {
    /// Line on which the row began that ends before this byte, when it holds so many line feeds itself.
    ///
    /// The position of the CSV reader counts from the end of the row before, blank lines included.
    fn line_of_row(&mut self, end: u64, held: usize) -> u64 {
        let mut last = None;
        while let Some(&at) = self.line_feeds.front().filter(|at| **at < end) {
            self.line_feeds.pop_front();
            self.lines += 1;
            last = Some(at);
        }
        let own_end = u64::from(last.is_some_and(|last| last + 1 == end));
        (1 + self.lines).saturating_sub(own_end + held as u64)
    }
}

/// A reader that refuses a row without end, and remembers where lines end.
pub(super) struct Bounded<R> {
    inner: R,
    passed: Rc<RefCell<Passed>>,
}

impl<R: Read> Read for Bounded<R> {
    fn read(&mut self, buffer: &mut [u8]) -> io::Result<usize> {
        let mut passed = self.passed.borrow_mut();
        if passed.bytes_since_row > LONGEST_ROW {
            return Err(io::Error::new(
                io::ErrorKind::InvalidData,
                "a row is longer than 1 MiB: a quote may not be closed",
            ));
        }
        let count = self.inner.read(buffer)?;
        let before = passed.bytes;
        let feeds = buffer.iter().take(count).zip(before..).filter(|(byte, _)| **byte == b'\n');
        passed.line_feeds.extend(feeds.map(|(_, at)| at));
        passed.bytes += count as u64;
        passed.bytes_since_row += count;
        Ok(count)
    }
}

/// A row with the line on which it begins.
#[derive(Default)]
struct Row {
    line: u64,
    record: ByteRecord,
}

/// A table that is being read.
pub(super) struct Source<R> {
    reader: csv::Reader<Bounded<R>>,
    passed: Rc<RefCell<Passed>>,
}

impl<R: Read> Source<R> {
    pub(super) fn new(input: R) -> Self {
        let passed = Rc::new(RefCell::new(Passed::default()));
        let bounded = Bounded { inner: input, passed: Rc::clone(&passed) };
        let reader = csv::ReaderBuilder::new().flexible(true).has_headers(true).from_reader(bounded);
        Self { reader, passed }
    }

    /// The heads of the columns.
    pub(super) fn heads(&mut self) -> Result<Vec<String>, BatchError> {
        let heads = self.reader.byte_headers().map_err(BatchError::of_csv)?;
        let heads: Vec<String> =
            heads.iter().map(|head| String::from_utf8_lossy(head).into_owned()).collect();
        self.passed.borrow_mut().bytes_since_row = 0;
        Ok(heads)
    }

    /// Fills a block with rows; fewer than its length at the end of the table.
    fn fill(&mut self, block: &mut Vec<Row>) -> Result<usize, BatchError> {
        block.resize_with(BLOCK, Row::default);
        for (count, row) in block.iter_mut().enumerate() {
            if !self.reader.read_byte_record(&mut row.record).map_err(BatchError::of_csv)? {
                return Ok(count);
            }
            let end = self.reader.position().byte();
            let held = row.record.as_slice().iter().filter(|byte| **byte == b'\n').count();
            let mut passed = self.passed.borrow_mut();
            row.line = passed.line_of_row(end, held);
            passed.bytes_since_row = 0;
        }
        Ok(BLOCK)
    }

    fn bytes(&self) -> u64 {
        self.passed.borrow().bytes
    }
}

/// Streams a table from its source to its sinks.
pub(super) fn stream<R: Read>(
    mut source: Source<R>,
    rows: &Rows<'_>,
    columns: &[OutputColumn],
    mut sinks: Sinks<'_>,
    progress: &mut dyn FnMut(Progress),
) -> Result<Summary, BatchError> {
    let apart = sinks.errors.is_some();
    let mut summary = Summary::default();
    heads(rows, columns, &mut sinks)?;
    let mut block = Vec::new();
    loop {
        let count = source.fill(&mut block)?;
        let filled = block.get(..count).unwrap_or_default();
        let worked: Vec<Worked> =
            filled.par_chunks(CHUNK).map(|chunk| work(chunk, rows, columns, apart)).collect();
        for worked in worked {
            sinks.output.write_all(&worked.output).map_err(BatchError::Output)?;
            if let Some(errors) = &mut sinks.errors {
                errors.write_all(&worked.errors).map_err(BatchError::Errors)?;
            }
            summary.add(&worked.summary);
        }
        progress(Progress { rows: summary.rows, bytes: source.bytes() });
        if count < BLOCK {
            break;
        }
    }
    sinks.output.flush().map_err(BatchError::Output)?;
    if let Some(errors) = &mut sinks.errors {
        errors.flush().map_err(BatchError::Errors)?;
    }
    Ok(summary)
}

/// The heads of the output and of the errors.
fn heads(rows: &Rows<'_>, columns: &[OutputColumn], sinks: &mut Sinks<'_>) -> Result<(), BatchError> {
    let mut line = Line::default();
    for column in &rows.columns {
        line.text(&column.head);
    }
    for (name, _) in columns {
        line.text(name);
    }
    if sinks.errors.is_none() {
        line.text("errors");
    }
    line.end();
    sinks.output.write_all(&line.bytes).map_err(BatchError::Output)?;
    if let Some(errors) = &mut sinks.errors {
        errors.write_all(b"line,error\n").map_err(BatchError::Errors)?;
    }
    Ok(())
}

fn work(chunk: &[Row], rows: &Rows<'_>, columns: &[OutputColumn], apart: bool) -> Worked {
    let mut worker = Worker::default();
    let mut worked = Worked::default();
    let (mut output, mut errors) = (Line::default(), Line::default());
    for Row { line: number, record } in chunk {
        let number = *number;
        worked.summary.rows += 1;
        let outcome = cells(record, rows).and_then(|cells| rows.outcome(&mut worker, &cells));
        if apart && let Err(error) = &outcome {
            errors.number_text(&number.to_string());
            errors.text(error);
            errors.end();
            worked.summary.note(number, error);
            continue;
        }
        for index in 0..rows.columns.len() {
            output.text(&String::from_utf8_lossy(record.get(index).unwrap_or_default()));
        }
        match &outcome {
            Ok(outcome) => {
                worked.summary.met += u64::from(outcome.meets_all());
                for (_, value) in columns {
                    match value(outcome) {
                        Value::Number(number) => output.number(number),
                        Value::Text(text) => output.text(text),
                        Value::None => output.number_text(""),
                    }
                }
                if !apart {
                    output.number_text("");
                }
            }
            Err(error) => {
                columns.iter().for_each(|_| output.number_text(""));
                output.text(&format!("line {number}: {error}"));
                worked.summary.note(number, error);
            }
        }
        output.end();
    }
    worked.output = output.bytes;
    worked.errors = errors.bytes;
    worked
}

/// The cells of a row as text, as many as the table has columns.
fn cells<'r>(record: &'r ByteRecord, rows: &Rows<'_>) -> Result<Vec<&'r str>, String> {
    let wanted = rows.columns.len();
    if record.len() != wanted {
        return Err(format!("the row has {} cells, the head has {wanted}", record.len()));
    }
    record
        .iter()
        .zip(&rows.columns)
        .map(|(cell, column)| match std::str::from_utf8(cell) {
            Ok(cell) => Ok(cell.trim()),
            Err(_) if column.key.is_none() => Ok(""),
            Err(_) => Err(format!("{}: a character here is not UTF-8", column.head.trim())),
        })
        .collect()
}

/// A line of comma-separated values under construction.
#[derive(Default)]
struct Line {
    bytes: Vec<u8>,
    begun: bool,
}

impl Line {
    fn comma(&mut self) {
        if self.begun {
            self.bytes.push(b',');
        }
        self.begun = true;
    }

    /// A number as short as it reads back; nothing when it is none.
    fn number(&mut self, value: f64) {
        self.comma();
        if value.is_finite() {
            // Writing into a vector does not fail.
            let _ = serde_json::to_writer(&mut self.bytes, &value);
        }
    }

    /// Digits that were written elsewhere.
    fn number_text(&mut self, digits: &str) {
        self.comma();
        self.bytes.extend_from_slice(digits.as_bytes());
    }

    /// A text, quoted where it must be, and kept from being taken for a formula.
    fn text(&mut self, text: &str) {
        self.comma();
        let guard = if starts_a_formula(text) { "'" } else { "" };
        let quoted = text.contains([',', '"', '\n', '\r']);
        if !quoted {
            self.bytes.extend_from_slice(guard.as_bytes());
            self.bytes.extend_from_slice(text.as_bytes());
            return;
        }
        self.bytes.push(b'"');
        self.bytes.extend_from_slice(guard.as_bytes());
        self.bytes.extend_from_slice(text.replace('"', "\"\"").as_bytes());
        self.bytes.push(b'"');
    }

    fn end(&mut self) {
        self.bytes.push(b'\n');
        self.begun = false;
    }
}

/// Whether a spreadsheet would take a text for a formula: it begins with one of = + - @, a tab or a carriage return,
/// and is no number with its unit.
///
/// Source: OWASP, *CSV Injection*.
fn starts_a_formula(text: &str) -> bool {
    let Some(first) = text.chars().next() else { return false };
    if !matches!(first, '=' | '+' | '-' | '@' | '\t' | '\r') {
        return false;
    }
    let rest = text.get(1..).unwrap_or("");
    let number = matches!(first, '+' | '-') && rest.starts_with(|c: char| c.is_ascii_digit());
    let plain = |c: char| c.is_alphanumeric() || matches!(c, '.' | ' ' | 'µ' | '·' | '°');
    !(number && rest.chars().all(plain))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn what_a_spreadsheet_would_run_is_kept_from_it() {
        for text in ["=1+1", "+cmd|' /C calc'!A0", "-2+3", "@SUM(A1)", "\tx", "-(1)", "+-1", "=", "-"] {
            assert!(starts_a_formula(text), "{text}");
        }
        for text in ["", "H7/s6", "-12.5", "-12 um", "+7 µm", "rated", "60 mm"] {
            assert!(!starts_a_formula(text), "{text}");
        }
    }

    #[test]
    fn cells_are_quoted_where_they_must_be() {
        let mut line = Line::default();
        line.text("a \"b\", c");
        line.number(0.1);
        line.number(f64::NAN);
        line.text("=x,y");
        line.end();
        assert_eq!(String::from_utf8(line.bytes).unwrap(), "\"a \"\"b\"\", c\",0.1,,\"'=x,y\"\n");
    }
}
