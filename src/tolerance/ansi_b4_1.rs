//! Inch fits of ANSI B4.1 for nominal sizes over 0 up to and including 19.69 in.
//!
//! Every class names both members; every hole is an H hole. The rows are kept as published, also where a
//! shaft's width differs from the grade's. Source: ANSI B4.1-1967 through *Machinery's Handbook*; what was
//! seen printed, derived, or rests on memory stands in the `basis` of each row in `src/tolerance/tables`.

mod table;

use std::fmt;
use std::str::FromStr;

pub use table::{AnsiRow, Basis};

use self::table::rows;
use super::exact::{self, metres};
use super::{FitLimits, ToleranceError};

/// Largest nominal size of the tables, pm: 19.69 in.
const LARGEST: i64 = 500_126_000_000;

/// The five series of ANSI B4.1.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Series {
    /// Running and sliding fits, RC1 to RC9.
    Running,
    /// Clearance locational fits, LC1 to LC11 (LC1 to LC5 are carried).
    LocationalClearance,
    /// Transition locational fits, LT1 to LT6.
    LocationalTransition,
    /// Interference locational fits, LN1 to LN3.
    LocationalInterference,
    /// Force and shrink fits, FN1 to FN5.
    Force,
}

impl Series {
    /// All series in the order of the standard.
    pub const ALL: [Self; 5] = [
        Self::Running,
        Self::LocationalClearance,
        Self::LocationalTransition,
        Self::LocationalInterference,
        Self::Force,
    ];

    /// Its letters, such as `FN`.
    pub fn name(self) -> &'static str {
        match self {
            Self::Running => "RC",
            Self::LocationalClearance => "LC",
            Self::LocationalTransition => "LT",
            Self::LocationalInterference => "LN",
            Self::Force => "FN",
        }
    }

    /// Number of its last class in the standard.
    pub fn last(self) -> u8 {
        match self {
            Self::Running => 9,
            Self::LocationalClearance => 11,
            Self::LocationalTransition => 6,
            Self::LocationalInterference => 3,
            Self::Force => 5,
        }
    }

    /// Number of its last class whose table is carried.
    fn last_carried(self) -> u8 {
        if self == Self::LocationalClearance { 5 } else { self.last() }
    }
}

/// A class of ANSI B4.1, such as FN 4; it names hole and shaft together.
///
/// # Example
/// ```
/// use hubgrip::tolerance::ansi_b4_1::AnsiClass;
/// let class: AnsiClass = "FN 2".parse().unwrap();
/// let limits = class.limits(1.25 * 0.0254).unwrap();
/// let interference = limits.interference();
/// // 0.8 to 2.4 thousandths of an inch (Machinery's Handbook, 27th ed., Table 11).
/// assert_eq!(interference.loosest, 20.32e-6);
/// assert_eq!(interference.tightest, 60.96e-6);
/// ```
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct AnsiClass {
    series: Series,
    number: u8,
}

impl AnsiClass {
    /// The class of a series with that number; none when the standard has no such class.
    pub fn new(series: Series, number: u8) -> Option<Self> {
        (1..=series.last()).contains(&number).then_some(Self { series, number })
    }

    /// All classes whose tables are carried, in the order of the standard.
    pub fn all() -> impl Iterator<Item = Self> {
        Series::ALL
            .into_iter()
            .flat_map(|series| (1..=series.last_carried()).map(move |number| Self { series, number }))
    }

    /// Its series.
    pub fn series(self) -> Series {
        self.series
    }

    /// Its number within the series.
    pub fn number(self) -> u8 {
        self.number
    }

    /// Limits of hole and shaft at a nominal size, m.
    ///
    /// Each deviation is tabulated by steps of nominal size, in thousandths of an inch of exactly 25.4 µm.
    ///
    /// D nominal size (m), valid over 0 up to and including 19.69 in (0.500126 m); FN3 over 0.95 in, LT3 and
    /// LT4 over 0.24 in only; LC6 to LC11 are not carried.
    ///
    /// Source: ANSI B4.1-1967, tables of limits of the five series.
    ///
    /// # Errors
    /// A nominal size outside the tables; a class not carried, or not defined at that size (with the nearest
    /// that are).
    ///
    /// # Example
    /// ```
    /// use hubgrip::tolerance::ansi_b4_1::AnsiClass;
    /// let class: AnsiClass = "FN3".parse().unwrap();
    /// let limits = class.limits(2.5 * 0.0254).unwrap();
    /// assert_eq!((limits.hole.lower, limits.hole.upper), (0.0, 30.48e-6)); // +1.2 thousandths
    /// assert_eq!((limits.shaft.lower, limits.shaft.upper), (63.5e-6, 81.28e-6)); // +2.5, +3.2
    /// ```
    pub fn limits(&self, nominal: f64) -> Result<FitLimits, ToleranceError> {
        let row = self.row(nominal)?;
        Ok(FitLimits { nominal, hole: row.hole(), shaft: row.shaft() })
    }

    /// The row of the table at a nominal size, with its step and what it rests on.
    ///
    /// # Errors
    /// As [`AnsiClass::limits`].
    pub fn row(&self, nominal: f64) -> Result<&'static AnsiRow, ToleranceError> {
        if self.number > self.series.last_carried() {
            return Err(ToleranceError::NotCarried {
                class: self.to_string(),
                reason: "no printed source of LC6 to LC11 was found, and copies in circulation carry slips",
            });
        }
        let size = size_of(nominal)?;
        self.row_at(size)?.ok_or_else(|| self.not_defined(size, nominal))
    }

    /// What a user of the class should know at that size; empty when there is nothing, or when the class has
    /// no limits there.
    pub fn remarks(&self, nominal: f64) -> Vec<String> {
        match self.row(nominal) {
            Ok(row) if row.basis() == Basis::Memory => vec![format!(
                "{self} {}: these limits rest on memory; confirm against a printed copy of ANSI B4.1.",
                row.step_text()
            )],
            _ => Vec::new(),
        }
    }

    fn row_at(&self, size: i64) -> Result<Option<&'static AnsiRow>, ToleranceError> {
        let rows = rows(*self)?;
        let row = rows.get(rows.partition_point(|row| row.up_to_picometres() < size));
        Ok(row.filter(|row| row.over_picometres() < size))
    }

    fn not_defined(&self, size: i64, nominal: f64) -> ToleranceError {
        let begins = rows(*self).ok().and_then(<[AnsiRow]>::first).map(AnsiRow::over_picometres);
        let reason = match begins {
            Some(over) => format!("it is defined over {} only", exact::inches_text(metres(over))),
            None => "it has no table".to_owned(),
        };
        let class = |number: u8| Self { number, ..*self };
        let defined = |class: &Self| matches!(class.row_at(size), Ok(Some(_)));
        let below = (1..self.number).rev().map(class).find(defined);
        let above = (self.number + 1..=self.series.last_carried()).map(class).find(defined);
        ToleranceError::NotDefined {
            class: self.to_string(),
            nominal,
            reason,
            nearest: below.into_iter().chain(above).map(|class| class.to_string()).collect(),
            inch: true,
        }
    }
}

/// All classes that are defined at a nominal size, in the order of the standard.
///
/// # Errors
/// A nominal size outside the tables.
pub fn defined_classes(nominal: f64) -> Result<Vec<AnsiClass>, ToleranceError> {
    let size = size_of(nominal)?;
    let mut classes = Vec::new();
    for class in AnsiClass::all() {
        if class.row_at(size)?.is_some() {
            classes.push(class);
        }
    }
    Ok(classes)
}

impl fmt::Display for AnsiClass {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.pad(&format!("{} {}", self.series.name(), self.number))
    }
}

impl FromStr for AnsiClass {
    type Err = ToleranceError;

    /// Reads `FN 4`, `FN4`, `fn-4`.
    fn from_str(text: &str) -> Result<Self, ToleranceError> {
        let text = text.trim();
        let fault = |reason: String, help: String| ToleranceError::UnreadableFit {
            text: text.to_owned(),
            reason,
            help,
        };
        let Some((series, rest)) = series_of(text) else {
            return Err(fault(
                "it does not begin with a series of ANSI B4.1".to_owned(),
                "the series are RC, LC, LT, LN and FN, as in `FN 4`".to_owned(),
            ));
        };
        let digits = rest.trim_start_matches(|c: char| c.is_whitespace() || c == '-');
        let classes = format!("{0} 1 to {0} {1}", series.name(), series.last());
        if digits.is_empty() {
            return Err(fault("the number of the class is missing".to_owned(), format!("write {classes}")));
        }
        let number = digits.bytes().all(|c| c.is_ascii_digit()).then(|| digits.parse().ok()).flatten();
        number.filter(|_| !digits.starts_with('0')).and_then(|number| Self::new(series, number)).ok_or_else(
            || {
                fault(
                    format!("there is no class `{digits}` of {}", series.name()),
                    format!("the classes are {classes}"),
                )
            },
        )
    }
}

/// The series whose letters begin the text, in capitals or small letters, and the rest of the text.
///
/// The rest must not go on with a letter: `fn` is a series, `fnord` is not.
pub(super) fn series_of(text: &str) -> Option<(Series, &str)> {
    let letters = text.get(..2)?;
    let rest = text.get(2..)?;
    let series = Series::ALL.into_iter().find(|series| series.name().eq_ignore_ascii_case(letters))?;
    (!rest.starts_with(char::is_alphabetic)).then_some((series, rest))
}

/// A nominal size in picometres, refused outside the tables.
fn size_of(nominal: f64) -> Result<i64, ToleranceError> {
    match exact::picometres(nominal) {
        Some(size) if size > 0 && size <= LARGEST => Ok(size),
        _ => Err(ToleranceError::NominalOutOfRange {
            nominal,
            standard: "the tables of ANSI B4.1",
            covers: "over 0 to 19.69 in",
            inch: true,
        }),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    const INCH: f64 = 0.0254;

    fn class(text: &str) -> AnsiClass {
        text.parse().unwrap()
    }

    #[test]
    fn a_class_is_read_as_people_write_it() {
        for text in ["FN 4", "FN4", "fn-4", "Fn  4", " FN - 4 "] {
            assert_eq!(class(text).to_string(), "FN 4", "{text}");
        }
        for class in AnsiClass::all() {
            assert_eq!(class.to_string().parse(), Ok(class));
        }
        assert_eq!(AnsiClass::all().count(), 9 + 5 + 6 + 3 + 5);
    }

    #[test]
    fn faults_say_what_there_is() {
        for (text, reason, help) in [
            ("FN", "number of the class is missing", "FN 1 to FN 5"),
            ("FN 6", "no class `6` of FN", "FN 1 to FN 5"),
            ("RC0", "no class `0`", "RC 1 to RC 9"),
            ("RC05", "no class `05`", "RC 1 to RC 9"),
            ("FN 4.5", "no class `4.5`", "FN 1 to FN 5"),
            ("FN 999", "no class `999`", "FN 1 to FN 5"),
            ("FM 4", "does not begin with a series", "RC, LC, LT, LN and FN"),
            ("fé4", "does not begin with a series", "RC, LC, LT, LN and FN"),
        ] {
            let error = text.parse::<AnsiClass>().unwrap_err();
            assert!(error.to_string().contains(reason), "{text}: {error}");
            assert!(error.help().unwrap().contains(help), "{text}: {:?}", error.help());
        }
    }

    #[test]
    fn undefined_rows_name_the_nearest_class() {
        let error = class("FN3").limits(0.95 * INCH).unwrap_err();
        assert_eq!(error.to_string(), "FN 3 is not defined at 0.95 in: it is defined over 0.95 in only");
        assert_eq!(error.help().unwrap(), "defined at this size: FN 2, FN 4");
        assert!(class("FN3").limits(0.951 * INCH).is_ok());
        let error = class("LT 3").limits(0.24 * INCH).unwrap_err();
        assert_eq!(error.help().unwrap(), "defined at this size: LT 2, LT 5");
        let error = class("LT 4").limits(0.1 * INCH).unwrap_err();
        assert_eq!(error.help().unwrap(), "defined at this size: LT 2, LT 5");
    }

    #[test]
    fn sizes_outside_the_tables_and_tables_not_carried_are_refused() {
        for nominal in [0.0, -1.0, 19.70, 200.0, f64::NAN] {
            let error = class("FN 2").limits(nominal * INCH).unwrap_err();
            assert!(matches!(error, ToleranceError::NominalOutOfRange { .. }), "{error}");
        }
        assert!(class("FN 2").limits(19.69 * INCH).is_ok());
        for number in 6..=11 {
            let error = class(&format!("LC{number}")).limits(INCH).unwrap_err();
            assert!(matches!(error, ToleranceError::NotCarried { .. }), "{error}");
        }
    }

    #[test]
    fn rows_from_memory_say_so() {
        let remark = &class("FN 5").remarks(4.0 * INCH)[0];
        assert_eq!(
            remark,
            "FN 5 over 3.94 to 4.73 in: these limits rest on memory; confirm against a printed copy of ANSI B4.1."
        );
        assert!(class("FN 5").remarks(2.0 * INCH).is_empty());
        assert!(class("LC 5").remarks(10.0 * INCH)[0].contains("memory"));
        assert!(class("LC 9").remarks(1.0 * INCH).is_empty());
    }

    #[test]
    fn defined_classes_leave_out_the_undefined() {
        assert_eq!(defined_classes(INCH).unwrap().len(), 28);
        assert_eq!(defined_classes(0.5 * INCH).unwrap().len(), 27);
        assert_eq!(defined_classes(0.2 * INCH).unwrap().len(), 25);
        assert!(defined_classes(20.0 * INCH).is_err());
    }
}
