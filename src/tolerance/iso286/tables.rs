//! The tables of ISO 286-1, built in: standard tolerance grades, fundamental deviations, the correction Δ.
//!
//! Lengths are whole picometres; each CSV file names its published sources in its first lines.

use std::sync::LazyLock;

use super::class::{Grade, Letter};
use crate::tolerance::exact::{self, MICROMETRE, MILLIMETRE};
use crate::tolerance::{Member, ToleranceError};

const GRADE_TABLE: (&str, &str) = ("it_grades.csv", include_str!("../tables/it_grades.csv"));
const DELTA_TABLE: (&str, &str) = ("delta.csv", include_str!("../tables/delta.csv"));
const SHAFT_TABLE: (&str, &str) = ("shaft_deviations.csv", include_str!("../tables/shaft_deviations.csv"));
const HOLE_TABLE: (&str, &str) = ("hole_deviations.csv", include_str!("../tables/hole_deviations.csv"));

/// A step of nominal sizes: over the first, up to and including the second, pm.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) struct Step {
    pub(super) over: i64,
    pub(super) up_to: i64,
}

/// Which deviation a row of the table gives.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Given {
    /// The upper one; the lower one is a grade width below.
    Upper,
    /// The lower one; the upper one is a grade width above.
    Lower,
    /// Half the grade width to each side.
    Symmetric,
}

/// The fundamental deviation of one letter in one step, for some grades.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) struct Deviation {
    pub(super) step: Step,
    pub(super) grades: GradeSet,
    pub(super) given: Given,
    /// The deviation, pm; zero when symmetric.
    pub(super) value: i64,
    /// Whether the correction Δ is added.
    pub(super) add_delta: bool,
}

/// Some of the twenty grades.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) struct GradeSet(u32);

impl GradeSet {
    pub(super) fn contains(self, grade: Grade) -> bool {
        self.0 & (1 << grade.index()) != 0
    }

    /// Reads `all`, `6`, `4-7`, `<=3`, `>8` or several of them between commas.
    fn parse(text: &str) -> Option<Self> {
        let mut set = 0;
        for part in text.split(',') {
            let (first, last) = if part == "all" {
                ("01", "18")
            } else if let Some(last) = part.strip_prefix("<=") {
                ("01", last)
            } else if let Some(before) = part.strip_prefix('>') {
                (Grade::ALL.get(Grade::from_name(before)?.index() + 1)?.name(), "18")
            } else {
                part.split_once('-').unwrap_or((part, part))
            };
            let (first, last) = (Grade::from_name(first)?, Grade::from_name(last)?);
            for grade in Grade::ALL.into_iter().filter(|grade| (first..=last).contains(grade)) {
                set |= 1 << grade.index();
            }
        }
        Some(Self(set))
    }
}

/// A width for each grade, where the table has one.
type Widths = [Option<i64>; Grade::ALL.len()];

/// All tables, in ascending steps.
#[derive(Debug)]
pub(super) struct Tables {
    grades: Vec<(Step, Widths)>,
    delta: Vec<(Step, Widths)>,
    holes: Vec<Vec<Deviation>>,
    shafts: Vec<Vec<Deviation>>,
}

/// The tables, read once.
pub(super) fn tables() -> Result<&'static Tables, ToleranceError> {
    static TABLES: LazyLock<Result<Tables, ToleranceError>> = LazyLock::new(Tables::read);
    TABLES.as_ref().map_err(Clone::clone)
}

impl Tables {
    fn read() -> Result<Self, ToleranceError> {
        Ok(Self {
            grades: read_widths(GRADE_TABLE)?,
            delta: read_widths(DELTA_TABLE)?,
            holes: read_deviations(HOLE_TABLE)?,
            shafts: read_deviations(SHAFT_TABLE)?,
        })
    }

    /// Width of a grade at a size, pm.
    pub(super) fn grade_width(&self, grade: Grade, size: i64) -> Option<i64> {
        width(&self.grades, grade, size)
    }

    /// Correction Δ at a size, pm.
    pub(super) fn delta(&self, grade: Grade, size: i64) -> Option<i64> {
        width(&self.delta, grade, size)
    }

    /// All rows of a letter, in ascending steps.
    pub(super) fn rows(&self, member: Member, letter: Letter) -> &[Deviation] {
        let letters = match member {
            Member::Hole => &self.holes,
            Member::Shaft => &self.shafts,
        };
        letters.get(letter as usize).map_or(&[], Vec::as_slice)
    }

    /// The rows of a letter at a size; more than one when the deviation depends on the grade.
    pub(super) fn rows_at(
        &self,
        member: Member,
        letter: Letter,
        size: i64,
    ) -> impl Iterator<Item = &Deviation> {
        let rows = self.rows(member, letter);
        let first = rows.partition_point(|row| row.step.up_to < size);
        rows.iter().skip(first).take_while(move |row| row.step.over < size)
    }

    /// The row of a class at a size.
    pub(super) fn row(&self, member: Member, letter: Letter, grade: Grade, size: i64) -> Option<&Deviation> {
        self.rows_at(member, letter, size).find(|row| row.grades.contains(grade))
    }
}

fn width(table: &[(Step, Widths)], grade: Grade, size: i64) -> Option<i64> {
    let (step, widths) = table.get(table.partition_point(|(step, _)| step.up_to < size))?;
    (step.over < size).then(|| widths.get(grade.index()).copied().flatten()).flatten()
}

/// One row of a built-in table, with the name of the table for a fault.
struct Row<'a> {
    table: &'static str,
    headers: &'a csv::StringRecord,
    cells: &'a csv::StringRecord,
}

impl Row<'_> {
    fn fault(&self, column: &str) -> ToleranceError {
        let line = self.cells.position().map_or(0, csv::Position::line);
        ToleranceError::BuiltInTable { table: self.table, detail: format!("line {line}, column {column}") }
    }

    fn cell(&self, column: &str) -> Result<&str, ToleranceError> {
        let index = self.headers.iter().position(|header| header == column);
        index.and_then(|index| self.cells.get(index)).ok_or_else(|| self.fault(column))
    }

    fn length(&self, column: &str, unit: f64) -> Result<i64, ToleranceError> {
        exact::parse(self.cell(column)?, unit).ok_or_else(|| self.fault(column))
    }

    fn step(&self) -> Result<Step, ToleranceError> {
        Ok(Step { over: self.length("over_mm", MILLIMETRE)?, up_to: self.length("up_to_mm", MILLIMETRE)? })
    }
}

fn for_each_row(
    (table, text): (&'static str, &'static str),
    mut take: impl FnMut(&Row) -> Result<(), ToleranceError>,
) -> Result<(), ToleranceError> {
    let fault = |error: csv::Error| ToleranceError::BuiltInTable { table, detail: error.to_string() };
    let mut reader = csv::ReaderBuilder::new().comment(Some(b'#')).from_reader(text.as_bytes());
    let headers = reader.headers().map_err(fault)?.clone();
    for cells in reader.records() {
        let cells = cells.map_err(fault)?;
        take(&Row { table, headers: &headers, cells: &cells })?;
    }
    Ok(())
}

fn read_widths(table: (&'static str, &'static str)) -> Result<Vec<(Step, Widths)>, ToleranceError> {
    let mut rows = Vec::new();
    for_each_row(table, |row| {
        let mut widths = Widths::default();
        for (header, cell) in row.headers.iter().zip(row.cells) {
            let Some(grade) = header.strip_prefix("IT").and_then(Grade::from_name) else { continue };
            if !cell.is_empty()
                && let Some(width) = widths.get_mut(grade.index())
            {
                *width = Some(row.length(header, MICROMETRE)?);
            }
        }
        rows.push((row.step()?, widths));
        Ok(())
    })?;
    rows.sort_by_key(|(step, _)| step.over);
    Ok(rows)
}

fn read_deviations(table: (&'static str, &'static str)) -> Result<Vec<Vec<Deviation>>, ToleranceError> {
    let mut letters = vec![Vec::new(); Letter::ALL.len()];
    for_each_row(table, |row| {
        let letter = Letter::from_name(&row.cell("letter")?.to_ascii_lowercase())
            .ok_or_else(|| row.fault("letter"))?;
        let given = match row.cell("which")? {
            "es" | "ES" => Given::Upper,
            "ei" | "EI" => Given::Lower,
            "sym" => Given::Symmetric,
            _ => return Err(row.fault("which")),
        };
        let value = if given == Given::Symmetric { 0 } else { row.length("um", MICROMETRE)? };
        let deviation = Deviation {
            step: row.step()?,
            grades: GradeSet::parse(row.cell("grades")?).ok_or_else(|| row.fault("grades"))?,
            given,
            value,
            add_delta: row.headers.iter().any(|header| header == "add_delta")
                && row.cell("add_delta")? == "1",
        };
        if let Some(rows) = letters.get_mut(letter as usize) {
            rows.push(deviation);
        }
        Ok(())
    })?;
    for rows in &mut letters {
        rows.sort_by_key(|row: &Deviation| row.step.over);
    }
    Ok(letters)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_built_in_tables_are_whole() {
        let tables = Tables::read().unwrap();
        assert_eq!(tables.grades.len(), 21);
        assert_eq!(tables.delta.len(), 13);
        assert_eq!(tables.shafts.iter().map(Vec::len).sum::<usize>(), 893);
        assert_eq!(tables.holes.iter().map(Vec::len).sum::<usize>(), 1219);
    }

    #[test]
    fn steps_join_and_no_class_has_two_rows() {
        let tables = Tables::read().unwrap();
        for table in [&tables.grades, &tables.delta] {
            for pair in table.windows(2) {
                assert_eq!(pair[0].0.up_to, pair[1].0.over);
            }
        }
        for rows in tables.holes.iter().chain(&tables.shafts) {
            assert!(!rows.is_empty());
            for pair in rows.windows(2) {
                if pair[0].step == pair[1].step {
                    assert_eq!(pair[0].grades.0 & pair[1].grades.0, 0, "{pair:?}");
                } else {
                    assert_eq!(pair[0].step.up_to, pair[1].step.over, "{pair:?}");
                }
            }
        }
    }

    #[test]
    fn delta_is_the_difference_of_two_grades() {
        // ISO 286-1: Δ = ITn − IT(n−1), over 3 to 500 mm; IT3 to IT8 in 12 steps.
        let tables = Tables::read().unwrap();
        let mut compared = 0;
        for (step, widths) in tables.delta.iter().skip(1) {
            for number in 3..=8 {
                let grade = Grade::numbered(number).unwrap();
                let finer = Grade::numbered(number - 1).unwrap();
                let difference = tables.grade_width(grade, step.up_to).unwrap()
                    - tables.grade_width(finer, step.up_to).unwrap();
                assert_eq!(widths[grade.index()], Some(difference), "{step:?} IT{grade}");
                compared += 1;
            }
        }
        assert_eq!(compared, 72);
    }

    #[test]
    fn a_broken_table_is_a_fault_that_names_the_place() {
        let broken = ("broken.csv", "# x\nover_mm,up_to_mm,letter,grades,which,um\n0,3,a,all,es,oops\n");
        let error = read_deviations(broken).unwrap_err();
        assert_eq!(error.to_string(), "the built-in table broken.csv cannot be read: line 3, column um");
    }

    #[test]
    fn sets_of_grades_are_read() {
        let names = |text| {
            let set = GradeSet::parse(text).unwrap();
            Grade::ALL.into_iter().filter(|grade| set.contains(*grade)).map(Grade::name).collect::<Vec<_>>()
        };
        assert_eq!(names("6"), ["6"]);
        assert_eq!(names("3-5,7-8"), ["3", "4", "5", "7", "8"]);
        assert_eq!(names("<=0,>16"), ["01", "0", "17", "18"]);
        assert_eq!(names("all").len(), 20);
        assert_eq!(GradeSet::parse("some"), None);
    }
}
