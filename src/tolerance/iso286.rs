//! Limits and fits of ISO 286 for nominal sizes over 0 up to and including 3150 mm.
//!
//! The limits come from the tables of ISO 286-1 (fundamental deviation, standard tolerance grade, the
//! correction Δ for holes K to ZC), never from the formulas behind them. Source: ISO 286-1:1988 with
//! Cor.1:2006 (ISO 286-1:2010 has the same values) through the adoptions and handbooks named at the head of
//! each table in `src/tolerance/tables`.

mod class;
mod preferred;
mod tables;

pub(in crate::tolerance) use class::describe;
pub use class::{Grade, Letter, ToleranceClass};
pub use preferred::{PREFERRED_FITS_ANSI_B4_2, PREFERRED_FITS_ISO_286_1, PreferredFit};

use self::tables::{Deviation, Given, Step, Tables, tables};
use super::exact::{self, metres, millimetres_text};
use super::{Limits, Member, ToleranceError};

/// Largest nominal size of ISO 286-1, pm.
const LARGEST: i64 = 3_150_000_000_000;
/// Size to which the grades IT14 to IT18 and some deviations are not used, pm.
const ONE_MILLIMETRE: i64 = 1_000_000_000;
/// Size above which the width of IT4 was not found printed, pm.
const ONE_METRE: i64 = 1_000_000_000_000;
/// Size above which IT1 to IT5 were experimental, pm.
const FIVE_HUNDRED_MILLIMETRES: i64 = 500_000_000_000;

/// Width of a standard tolerance grade at a nominal size, m.
///
/// The width is tabulated by steps of nominal size: IT = table(step of D, grade).
///
/// D nominal size (m), valid over 0 up to and including 3.15 m; IT01 and IT0 to 0.5 m only; IT14 to IT18
/// not to 1 mm.
///
/// Source: ISO 286-1, table of standard tolerance grades.
///
/// # Errors
/// A nominal size outside the standard, a grade that is not defined or not used at that size.
///
/// # Example
/// ```
/// use hubgrip::tolerance::iso286::{Grade, it_grade};
/// let it7 = Grade::numbered(7).unwrap();
/// assert_eq!(it_grade(it7, 0.060).unwrap(), 30e-6);
/// assert_eq!(it_grade(it7, 0.080).unwrap(), 30e-6); // the end of a step belongs to it
/// assert_eq!(it_grade(it7, 0.0801).unwrap(), 35e-6);
/// ```
pub fn it_grade(grade: Grade, nominal: f64) -> Result<f64, ToleranceError> {
    let size = size_of(nominal)?;
    refuse_coarse_grade(&format!("IT{grade}"), grade, size, nominal)?;
    let width = tables()?.grade_width(grade, size);
    width.map(metres).ok_or_else(|| ToleranceError::NotDefined {
        class: format!("IT{grade}"),
        nominal,
        reason: "it is defined to 500 mm".to_owned(),
        nearest: vec!["IT1".to_owned()],
        inch: false,
    })
}

/// All classes of a member that are defined and used at a nominal size, by letter, then by grade.
///
/// # Errors
/// A nominal size outside the standard.
///
/// # Example
/// ```
/// use hubgrip::tolerance::{Member, iso286::defined_classes};
/// let classes = defined_classes(Member::Hole, 0.060).unwrap();
/// assert!(classes.iter().all(|class| class.limits(0.060).is_ok()));
/// ```
pub fn defined_classes(member: Member, nominal: f64) -> Result<Vec<ToleranceClass>, ToleranceError> {
    let size = size_of(nominal)?;
    let tables = tables()?;
    let every = Letter::ALL
        .into_iter()
        .flat_map(|letter| Grade::ALL.into_iter().map(move |grade| ToleranceClass { member, letter, grade }));
    Ok(every.filter(|class| class.is_defined(tables, size)).collect())
}

impl ToleranceClass {
    /// Lower and upper deviation of the class at a nominal size, m.
    ///
    /// Shafts: a to h give es, lower = es − IT; j to zc give ei, upper = ei + IT; js ±IT/2.
    /// Holes: A to H give EI, upper = EI + IT; J to ZC give ES (+ Δ where the standard adds it),
    /// lower = ES − IT; JS ±IT/2.
    ///
    /// D nominal size (m), valid over 0 up to and including 3.15 m, where the class is defined. Δ is added for
    /// K, M, N of IT3 to IT8 and P to ZC of IT3 to IT7, over 3 to 500 mm; M6 over 250 to 315 mm is the
    /// standard's exception. js and JS are the plain halves: see [`ToleranceClass::remarks`].
    ///
    /// Source: ISO 286-1, tables of fundamental deviations and of standard tolerance grades.
    ///
    /// # Errors
    /// A nominal size outside the standard; a class that is not defined at that size (with the nearest that
    /// are); a class that the standard does not let be used to 1 mm.
    ///
    /// # Example
    /// ```
    /// use hubgrip::tolerance::iso286::ToleranceClass;
    /// let class: ToleranceClass = "S7".parse().unwrap();
    /// let limits = class.limits(0.060).unwrap();
    /// assert_eq!((limits.lower, limits.upper), (-72e-6, -42e-6));
    /// ```
    pub fn limits(&self, nominal: f64) -> Result<Limits, ToleranceError> {
        let size = size_of(nominal)?;
        let tables = tables()?;
        self.refuse_unused(size, nominal)?;
        let (lower, upper) =
            self.deviations(tables, size).ok_or_else(|| self.not_defined(tables, size, nominal))?;
        Ok(Limits { lower: metres(lower), upper: metres(upper) })
    }

    /// What a user of the class should know at that size; empty when there is nothing, or when the class has
    /// no limits there.
    pub fn remarks(&self, nominal: f64) -> Vec<String> {
        let (Ok(size), Ok(tables)) = (size_of(nominal), tables()) else { return Vec::new() };
        if !self.is_defined(tables, size) {
            return Vec::new();
        }
        let mut remarks = Vec::new();
        if matches!(self.letter, Letter::Cd | Letter::Ef | Letter::Fg) {
            remarks.push(format!(
                "{self}: the deviations cd, ef and fg are meant for fine mechanics (ISO 286-1)."
            ));
        }
        if size > FIVE_HUNDRED_MILLIMETRES {
            remarks.extend(self.remark_over_500_mm());
            remarks.extend(self.remark_on_memory(size));
        }
        if self.letter == Letter::Js {
            remarks.extend(self.remark_on_rounding(tables, size));
        }
        remarks
    }

    /// The step of nominal sizes whose row the class has at that size, for the record, such as
    /// `over 50 to 65 mm`; none when the class is not defined there.
    pub fn step_text(&self, nominal: f64) -> Option<String> {
        let size = size_of(nominal).ok()?;
        let row = tables().ok()?.row(self.member, self.letter, self.grade, size)?;
        Some(step_text(row.step))
    }

    fn remark_over_500_mm(&self) -> Option<String> {
        if self.grade.within(1, 5) {
            Some(format!(
                "{self}: the grades IT1 to IT5 over 500 mm were given for experimental use in ISO 286-1:1988."
            ))
        } else if !self.grade.within(6, 16) && self.letter != Letter::H && self.letter != Letter::Js {
            Some(format!(
                "{self}: over 500 mm the deviations were read from a table that covers IT6 to IT16; confirm \
                 this one against the standard."
            ))
        } else {
            None
        }
    }

    fn remark_on_memory(&self, size: i64) -> Option<String> {
        (self.grade.within(4, 4) && size > ONE_METRE).then(|| {
            format!("{self}: the width of IT4 over 1000 mm rests on memory; confirm it against the standard.")
        })
    }

    /// ISO 286-1 lets an odd IT of the grades 7 to 11 be rounded down to even before it is halved.
    fn remark_on_rounding(&self, tables: &Tables, size: i64) -> Option<String> {
        let width = tables.grade_width(self.grade, size)?;
        let odd = width % (2 * exact::MICROMETRE as i64) == exact::MICROMETRE as i64;
        (odd && self.grade.within(7, 11)).then(|| {
            let width = metres(width);
            format!(
                "{self}: the limits are the plain halves ±{} of IT{}; some tables print the rounded halves ±{} \
                 (note in ISO 286-1).",
                exact::micrometres_text(width / 2.0),
                self.grade,
                exact::micrometres_text((width - 1e-6) / 2.0)
            )
        })
    }

    fn deviations(&self, tables: &Tables, size: i64) -> Option<(i64, i64)> {
        let row: &Deviation = tables.row(self.member, self.letter, self.grade, size)?;
        let width = tables.grade_width(self.grade, size)?;
        let correction = if row.add_delta { tables.delta(self.grade, size)? } else { 0 };
        let value = row.value + correction;
        Some(match row.given {
            Given::Upper => (value - width, value),
            Given::Lower => (value, value + width),
            Given::Symmetric => (-width / 2, width / 2),
        })
    }

    fn is_defined(&self, tables: &Tables, size: i64) -> bool {
        self.unused_because(size).is_none() && self.deviations(tables, size).is_some()
    }

    fn refuse_unused(&self, size: i64, nominal: f64) -> Result<(), ToleranceError> {
        match self.unused_because(size) {
            Some(reason) => Err(ToleranceError::NotUsed { class: self.to_string(), nominal, reason }),
            None => Ok(()),
        }
    }

    fn unused_because(&self, size: i64) -> Option<&'static str> {
        if size > ONE_MILLIMETRE {
            return None;
        }
        if matches!(self.letter, Letter::A | Letter::B) {
            return Some("ISO 286-1 does not use the deviations a, A, b and B up to 1 mm");
        }
        if self.member == Member::Hole && self.letter == Letter::N && self.grade.within(9, 18) {
            return Some("ISO 286-1 does not use the deviation N in grades above IT8 up to 1 mm");
        }
        coarse(self.grade).then_some(COARSE_GRADES)
    }

    fn not_defined(&self, tables: &Tables, size: i64, nominal: f64) -> ToleranceError {
        ToleranceError::NotDefined {
            class: self.to_string(),
            nominal,
            reason: self.reach(tables, size),
            nearest: self.nearest_defined(tables, size),
            inch: false,
        }
    }

    /// Where the deviation of this class is defined.
    fn reach(&self, tables: &Tables, size: i64) -> String {
        let letter = self.letter.name_for(self.member);
        if tables.grade_width(self.grade, size).is_none() {
            return format!("IT{} is defined to 500 mm", self.grade);
        }
        let rows = tables.rows(self.member, self.letter);
        match (rows.first(), rows.last()) {
            (Some(first), _) if size <= first.step.over => {
                format!("{letter} is defined over {} only", millimetres_text(metres(first.step.over)))
            }
            (_, Some(last)) if size > last.step.up_to => {
                format!("{letter} is defined to {} only", millimetres_text(metres(last.step.up_to)))
            }
            _ => {
                let has = |grade: &Grade| Self { grade: *grade, ..*self }.is_defined(tables, size);
                let grades: Vec<&str> = Grade::ALL.into_iter().filter(has).map(Grade::name).collect();
                format!("{letter} has the grades {} there", grades.join(", "))
            }
        }
    }

    /// The next finer and coarser grade of the letter, and the letters to both sides in the grade.
    fn nearest_defined(&self, tables: &Tables, size: i64) -> Vec<String> {
        let grades = Grade::ALL.map(|grade| Self { grade, ..*self });
        let letters = Letter::ALL.map(|letter| Self { letter, ..*self });
        let (finer, coarser) = (&grades[..self.grade.index()], &grades[self.grade.index()..]);
        let (before, after) = (&letters[..self.letter as usize], &letters[self.letter as usize..]);
        let defined = |class: &&Self| class.is_defined(tables, size);
        [
            finer.iter().rev().find(defined),
            coarser.iter().find(defined),
            before.iter().rev().find(defined),
            after.iter().find(defined),
        ]
        .into_iter()
        .flatten()
        .map(Self::to_string)
        .collect()
    }
}

const COARSE_GRADES: &str = "ISO 286-1 does not use the grades IT14 to IT18 up to 1 mm";

fn coarse(grade: Grade) -> bool {
    grade.within(14, 18)
}

fn refuse_coarse_grade(class: &str, grade: Grade, size: i64, nominal: f64) -> Result<(), ToleranceError> {
    if size <= ONE_MILLIMETRE && coarse(grade) {
        return Err(ToleranceError::NotUsed { class: class.to_owned(), nominal, reason: COARSE_GRADES });
    }
    Ok(())
}

/// A nominal size in picometres, refused outside the standard.
fn size_of(nominal: f64) -> Result<i64, ToleranceError> {
    match exact::picometres(nominal) {
        Some(size) if size > 0 && size <= LARGEST => Ok(size),
        _ => Err(ToleranceError::NominalOutOfRange {
            nominal,
            standard: "ISO 286",
            covers: "over 0 to 3150 mm",
            inch: false,
        }),
    }
}

fn step_text(step: Step) -> String {
    let number = |length: i64| millimetres_text(metres(length)).replace(" mm", "");
    format!("over {} to {} mm", number(step.over), number(step.up_to))
}

#[cfg(test)]
mod tests {
    use super::*;

    fn class(text: &str) -> ToleranceClass {
        text.parse().unwrap()
    }

    #[test]
    fn an_undefined_class_names_the_nearest() {
        let error = class("J9").limits(0.060).unwrap_err();
        assert_eq!(error.to_string(), "J9 is not defined at 60 mm: J has the grades 6, 7, 8 there");
        assert_eq!(error.help().unwrap(), "defined at this size: J8, H9, JS9");
        let error = class("t6").limits(0.020).unwrap_err();
        assert_eq!(error.to_string(), "t6 is not defined at 20 mm: t is defined over 24 mm only");
        assert_eq!(error.help().unwrap(), "defined at this size: s6, u6");
        let error = class("x7").limits(0.600).unwrap_err();
        assert_eq!(error.to_string(), "x7 is not defined at 600 mm: x is defined to 500 mm only");
        assert_eq!(error.help().unwrap(), "defined at this size: u7");
        let error = class("h01").limits(0.501).unwrap_err();
        assert_eq!(error.to_string(), "h01 is not defined at 501 mm: IT01 is defined to 500 mm");
        assert_eq!(error.help().unwrap(), "defined at this size: h1");
    }

    #[test]
    fn delta_starts_at_it3() {
        // ISO 286-1 tabulates Δ from IT3 only, so P2 has no limits although p2 has.
        assert!(class("p2").limits(0.060).is_ok());
        let error = class("P2").limits(0.060).unwrap_err();
        assert_eq!(error.help().unwrap(), "defined at this size: P3, JS2");
    }

    #[test]
    fn sizes_outside_the_standard_are_refused() {
        for nominal in [0.0, -0.06, 3.1501, f64::NAN, f64::INFINITY, 1e300] {
            let error = class("H7").limits(nominal).unwrap_err();
            assert!(matches!(error, ToleranceError::NominalOutOfRange { .. }), "{nominal}: {error}");
            assert!(it_grade(class("H7").grade, nominal).is_err());
            assert!(defined_classes(Member::Hole, nominal).is_err());
            assert!(class("H7").remarks(nominal).is_empty());
        }
        assert!(class("H7").limits(3.15).is_ok());
    }

    #[test]
    fn what_is_not_used_to_one_millimetre_is_refused() {
        // ISO 286-1: a, b (A, B) and N above IT8, and the grades IT14 to IT18, are not used to 1 mm.
        for text in ["a11", "A11", "b9", "B9", "N9", "h14", "JS18"] {
            let error = class(text).limits(0.001).unwrap_err();
            assert!(matches!(error, ToleranceError::NotUsed { .. }), "{text}: {error}");
            assert!(class(text).limits(0.001_001).is_ok(), "{text}");
        }
        for text in ["N8", "n9", "h13", "c9"] {
            assert!(class(text).limits(0.001).is_ok(), "{text}");
        }
        assert!(it_grade(Grade::from_name("14").unwrap(), 0.001).is_err());
    }

    #[test]
    fn remarks_are_made_where_the_standard_warns() {
        assert!(class("ef6").remarks(0.005)[0].contains("fine mechanics"));
        assert!(class("H5").remarks(0.600)[0].contains("experimental"));
        assert!(class("H5").remarks(0.500).is_empty());
        assert_eq!(class("H4").remarks(1.0).len(), 1);
        assert!(class("H4").remarks(1.001)[1].contains("memory"));
        assert!(class("d17").remarks(0.600)[0].contains("IT6 to IT16"));
        // IT7 over 18 to 30 mm is 21 µm, odd; over 50 to 80 mm it is 30 µm, even.
        assert_eq!(
            class("js7").remarks(0.025),
            [
                "js7: the limits are the plain halves ±10.5 µm of IT7; some tables print the rounded halves ±10 µm \
              (note in ISO 286-1)."
            ]
        );
        assert!(class("js7").remarks(0.060).is_empty());
        assert!(class("H7").remarks(0.060).is_empty());
        assert!(class("t6").remarks(0.020).is_empty());
    }

    #[test]
    fn the_step_that_was_read_is_named() {
        assert_eq!(class("s6").step_text(0.060).unwrap(), "over 50 to 65 mm");
        assert_eq!(class("t6").step_text(0.020), None);
    }
}
