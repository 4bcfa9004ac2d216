//! The tables of ANSI B4.1, built in; each CSV file names its published sources in its first lines.

use std::sync::LazyLock;

use super::AnsiClass;
use crate::tolerance::exact::{self, INCH, THOU, inches_text, metres};
use crate::tolerance::{Limits, ToleranceError};

const TABLES: [(&str, &str); 5] = [
    ("running.csv", include_str!("../tables/running.csv")),
    ("locational_clearance.csv", include_str!("../tables/locational_clearance.csv")),
    ("locational_transition.csv", include_str!("../tables/locational_transition.csv")),
    ("locational_interference.csv", include_str!("../tables/locational_interference.csv")),
    ("force_fits.csv", include_str!("../tables/force_fits.csv")),
];

/// What a row of the tables rests on.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Basis {
    /// Every figure was seen printed.
    Published,
    /// Some figures were seen printed, the others follow from them or from other classes of the same step.
    Derived,
    /// At least one figure rests on memory.
    Memory,
}

/// One row of the tables: a class in a step of nominal sizes.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct AnsiRow {
    class: AnsiClass,
    /// Picometres, as all lengths of the row.
    over: i64,
    up_to: i64,
    hole: (i64, i64),
    shaft: (i64, i64),
    interference: (i64, i64),
    iso_hole: String,
    iso_shaft: Option<String>,
    basis: Basis,
}

impl AnsiRow {
    /// The class.
    pub fn class(&self) -> AnsiClass {
        self.class
    }

    /// Nominal sizes of the row: over the first, up to and including the second, m.
    pub fn step(&self) -> (f64, f64) {
        (metres(self.over), metres(self.up_to))
    }

    /// The step for the record, such as `over 1.97 to 2.56 in`.
    pub fn step_text(&self) -> String {
        let (over, up_to) = self.step();
        format!("over {} to {}", inches_text(over).trim_end_matches(" in"), inches_text(up_to))
    }

    /// Limits of the hole, m from nominal.
    pub fn hole(&self) -> Limits {
        Limits { lower: metres(self.hole.0), upper: metres(self.hole.1) }
    }

    /// Limits of the shaft, m from nominal.
    pub fn shaft(&self) -> Limits {
        Limits { lower: metres(self.shaft.0), upper: metres(self.shaft.1) }
    }

    /// Least and greatest interference as the table prints them, m; clearance is negative.
    pub fn published_interference(&self) -> (f64, f64) {
        (metres(self.interference.0), metres(self.interference.1))
    }

    /// The tolerance class that the standard names for the hole, such as `H7`.
    pub fn hole_class(&self) -> &str {
        &self.iso_hole
    }

    /// The tolerance class that the standard names for the shaft; none for FN1 and RC9.
    pub fn shaft_class(&self) -> Option<&str> {
        self.iso_shaft.as_deref()
    }

    /// What the row rests on.
    pub fn basis(&self) -> Basis {
        self.basis
    }

    pub(super) fn over_picometres(&self) -> i64 {
        self.over
    }

    pub(super) fn up_to_picometres(&self) -> i64 {
        self.up_to
    }
}

/// All rows of a class in ascending steps; none when its table is not carried.
pub(super) fn rows(class: AnsiClass) -> Result<&'static [AnsiRow], ToleranceError> {
    static ROWS: LazyLock<Result<Vec<AnsiRow>, ToleranceError>> = LazyLock::new(read_all);
    let rows = ROWS.as_ref().map_err(Clone::clone)?;
    let first = rows.partition_point(|row| row.class < class);
    let after = rows.partition_point(|row| row.class <= class);
    Ok(rows.get(first..after).unwrap_or_default())
}

fn read_all() -> Result<Vec<AnsiRow>, ToleranceError> {
    let mut rows = Vec::new();
    for (table, text) in TABLES {
        rows.extend(read(table, text)?);
    }
    rows.sort_by_key(|row| (row.class, row.over));
    Ok(rows)
}

fn read(table: &'static str, text: &str) -> Result<Vec<AnsiRow>, ToleranceError> {
    let fault = |error: csv::Error| ToleranceError::BuiltInTable { table, detail: error.to_string() };
    let mut reader = csv::ReaderBuilder::new().comment(Some(b'#')).from_reader(text.as_bytes());
    let headers = reader.headers().map_err(fault)?.clone();
    let mut rows = Vec::new();
    for cells in reader.records() {
        rows.push(read_row(table, &headers, &cells.map_err(fault)?)?);
    }
    Ok(rows)
}

fn read_row(
    table: &'static str,
    headers: &csv::StringRecord,
    cells: &csv::StringRecord,
) -> Result<AnsiRow, ToleranceError> {
    let fault = |column: &str| {
        let line = cells.position().map_or(0, csv::Position::line);
        ToleranceError::BuiltInTable { table, detail: format!("line {line}, column {column}") }
    };
    let cell = |column: &str| {
        let index = headers.iter().position(|header| header == column);
        index.and_then(|index| cells.get(index)).ok_or_else(|| fault(column))
    };
    let length = |column: &str, unit: f64| exact::parse(cell(column)?, unit).ok_or_else(|| fault(column));
    let thousandths = |lower: &str, upper: &str| -> Result<(i64, i64), ToleranceError> {
        Ok((length(lower, THOU)?, length(upper, THOU)?))
    };
    Ok(AnsiRow {
        class: cell("class")?.parse().map_err(|_| fault("class"))?,
        over: length("over_in", INCH)?,
        up_to: length("up_to_in", INCH)?,
        hole: thousandths("hole_lower", "hole_upper")?,
        shaft: thousandths("shaft_lower", "shaft_upper")?,
        interference: thousandths("interference_min", "interference_max")?,
        iso_hole: cell("iso_hole")?.to_owned(),
        iso_shaft: Some(cell("iso_shaft")?.to_owned()).filter(|class| !class.is_empty()),
        basis: match cell("basis")? {
            "published" => Basis::Published,
            "derived" => Basis::Derived,
            "memory" => Basis::Memory,
            _ => return Err(fault("basis")),
        },
    })
}

#[cfg(test)]
mod tests {
    use super::super::Series;
    use super::*;

    #[test]
    fn the_built_in_tables_are_whole() {
        let count = |series| read_all().unwrap().iter().filter(|row| row.class.series() == series).count();
        assert_eq!(count(Series::Running), 117);
        assert_eq!(count(Series::LocationalClearance), 65);
        assert_eq!(count(Series::LocationalTransition), 74);
        assert_eq!(count(Series::LocationalInterference), 39);
        assert_eq!(count(Series::Force), 119);
    }

    #[test]
    fn a_broken_table_is_a_fault_that_names_the_place() {
        let (headers, _) = TABLES[4].1.split_once("\nFN1").unwrap();
        let broken = format!("{headers}\nFN1,0,0.12,0,0.25,0.3,0.5,0.05,0.5,H6,,hearsay\n");
        let error = read("broken.csv", &broken).unwrap_err();
        assert!(error.to_string().ends_with("line 7, column basis"), "{error}");
    }
}
