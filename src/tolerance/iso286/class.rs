//! A tolerance class as written on a drawing: the letter of the fundamental deviation and the grade.

use std::fmt;
use std::str::FromStr;

use crate::diagnostic::did_you_mean;
use crate::tolerance::{Member, ToleranceError};

/// Fundamental deviation, the letter of a tolerance class (ISO 286-1); capitals for holes.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
#[expect(missing_docs, reason = "each variant is the letter itself")]
pub enum Letter {
    A,
    B,
    C,
    Cd,
    D,
    E,
    Ef,
    F,
    Fg,
    G,
    H,
    J,
    Js,
    K,
    M,
    N,
    P,
    R,
    S,
    T,
    U,
    V,
    X,
    Y,
    Z,
    Za,
    Zb,
    Zc,
}

impl Letter {
    /// All letters in the order of the standard, from the loosest to the tightest.
    pub const ALL: [Self; 28] = [
        Self::A,
        Self::B,
        Self::C,
        Self::Cd,
        Self::D,
        Self::E,
        Self::Ef,
        Self::F,
        Self::Fg,
        Self::G,
        Self::H,
        Self::J,
        Self::Js,
        Self::K,
        Self::M,
        Self::N,
        Self::P,
        Self::R,
        Self::S,
        Self::T,
        Self::U,
        Self::V,
        Self::X,
        Self::Y,
        Self::Z,
        Self::Za,
        Self::Zb,
        Self::Zc,
    ];

    const NAMES: [&'static str; 28] = [
        "a", "b", "c", "cd", "d", "e", "ef", "f", "fg", "g", "h", "j", "js", "k", "m", "n", "p", "r", "s",
        "t", "u", "v", "x", "y", "z", "za", "zb", "zc",
    ];

    /// As written for a shaft, in small letters.
    pub fn name(self) -> &'static str {
        Self::NAMES[self as usize]
    }

    /// As written for that member: capitals for a hole, small letters for a shaft.
    pub fn name_for(self, member: Member) -> String {
        match member {
            Member::Hole => self.name().to_ascii_uppercase(),
            Member::Shaft => self.name().to_owned(),
        }
    }

    /// The letter with that name in small letters.
    pub(in crate::tolerance) fn from_name(name: &str) -> Option<Self> {
        Self::ALL.into_iter().find(|letter| letter.name() == name)
    }
}

/// Standard tolerance grade, IT01 to IT18 (ISO 286-1).
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Grade(u8);

impl Grade {
    /// All grades, from the finest.
    pub const ALL: [Self; 20] = {
        let mut grades = [Self(0); 20];
        let mut index = 0;
        while index < grades.len() {
            grades[index] = Self(index as u8);
            index += 1;
        }
        grades
    };

    const NAMES: [&'static str; 20] = [
        "01", "0", "1", "2", "3", "4", "5", "6", "7", "8", "9", "10", "11", "12", "13", "14", "15", "16",
        "17", "18",
    ];

    /// The grade IT1 to IT18 of that number; none for any other number (IT01 and IT0 are read from text).
    pub fn numbered(number: u8) -> Option<Self> {
        (1..=18).contains(&number).then_some(Self(number + 1))
    }

    /// A grade that is known to lie between IT1 and IT18, for constants.
    pub(super) const fn known(number: u8) -> Self {
        assert!(number >= 1 && number <= 18);
        Self(number + 1)
    }

    /// The grade written `01`, `0`, `1` to `18`.
    pub fn from_name(name: &str) -> Option<Self> {
        Self::ALL.into_iter().find(|grade| grade.name() == name)
    }

    /// As written in a class: `01`, `0`, `1` to `18`.
    pub fn name(self) -> &'static str {
        Self::NAMES[self.index()]
    }

    /// Place in [`Grade::ALL`].
    pub(super) fn index(self) -> usize {
        usize::from(self.0)
    }

    /// Whether the grade is the numbered grade `first`, the numbered grade `last` or between them.
    pub(super) fn within(self, first: u8, last: u8) -> bool {
        (first + 1..=last + 1).contains(&self.0)
    }
}

impl fmt::Display for Grade {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.pad(self.name())
    }
}

/// A tolerance class of ISO 286, such as `H7` or `s6`.
///
/// # Example
/// ```
/// use hubgrip::tolerance::{Member, iso286::ToleranceClass};
/// let class: ToleranceClass = "s6".parse().unwrap();
/// assert_eq!(class.member, Member::Shaft);
/// let limits = class.limits(0.060).unwrap();
/// assert_eq!((limits.lower, limits.upper), (53e-6, 72e-6));
/// ```
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct ToleranceClass {
    /// Hole or shaft.
    pub member: Member,
    /// Fundamental deviation.
    pub letter: Letter,
    /// Standard tolerance grade.
    pub grade: Grade,
}

impl ToleranceClass {
    /// The class as it would be written for the other member: `S7` for `s7`.
    pub fn mirrored(self) -> Self {
        Self { member: self.member.other(), ..self }
    }
}

impl fmt::Display for ToleranceClass {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.pad(&format!("{}{}", self.letter.name_for(self.member), self.grade))
    }
}

impl FromStr for ToleranceClass {
    type Err = ToleranceError;

    /// Reads a class as written on a drawing; capitals mean a hole, small letters a shaft.
    fn from_str(text: &str) -> Result<Self, ToleranceError> {
        let text = text.trim();
        let fault = |reason: String| ToleranceError::UnreadableClass {
            text: text.to_owned(),
            reason,
            help: class_help(text),
        };
        if let Some(odd) = text.chars().find(|c| !c.is_ascii_alphanumeric()) {
            return Err(fault(format!("{} does not belong in a class", describe(odd))));
        }
        let digits_at = text.find(|c: char| c.is_ascii_digit()).unwrap_or(text.len());
        let (letters, digits) = text.split_at(digits_at);
        if letters.is_empty() {
            return Err(fault("it must begin with the letter of the deviation".to_owned()));
        }
        let member = if letters.chars().all(|c| c.is_ascii_uppercase()) {
            Member::Hole
        } else if letters.chars().all(|c| c.is_ascii_lowercase()) {
            Member::Shaft
        } else {
            return Err(fault("holes have capital letters, shafts small ones".to_owned()));
        };
        let letter = Letter::from_name(&letters.to_ascii_lowercase())
            .ok_or_else(|| fault(format!("ISO 286 has no deviation `{letters}`")))?;
        if digits.is_empty() {
            return Err(fault("the grade is missing".to_owned()));
        }
        let grade = Grade::from_name(digits)
            .ok_or_else(|| fault(format!("there is no grade `{digits}`; grades are 01, 0 and 1 to 18")))?;
        Ok(Self { member, letter, grade })
    }
}

/// A character for a message; one that may look like another is named by its code.
pub(in crate::tolerance) fn describe(character: char) -> String {
    if character.is_ascii_graphic() {
        format!("`{character}`")
    } else if character == ' ' {
        "a blank".to_owned()
    } else {
        format!("the character U+{:04X}", u32::from(character))
    }
}

/// What was probably meant by a text that is no class.
fn class_help(text: &str) -> String {
    let plain: String = text.chars().filter(char::is_ascii_alphanumeric).collect();
    let digits_at = plain.find(|c: char| c.is_ascii_digit()).unwrap_or(plain.len());
    let (letters, digits) = plain.split_at(digits_at);
    let letter = Letter::from_name(&letters.to_ascii_lowercase());
    let grade = Grade::from_name(digits);
    match (letter, grade) {
        (Some(letter), Some(grade)) => {
            let shaft = ToleranceClass { member: Member::Shaft, letter, grade };
            format!("write `{}` for a hole or `{shaft}` for a shaft", shaft.mirrored())
        }
        (None, Some(grade)) if !letters.is_empty() => match did_you_mean(letters, Letter::NAMES) {
            Some(near) => format!("did you mean the deviation `{near}`, as in `{near}{grade}`?"),
            None => format!("deviations are {}", Letter::NAMES.join(", ")),
        },
        _ => "a class is a letter and a grade: `H7` for a hole, `s6` for a shaft".to_owned(),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn parse(text: &str) -> Result<ToleranceClass, ToleranceError> {
        text.parse()
    }

    #[test]
    fn every_class_is_written_as_it_is_read() {
        for letter in Letter::ALL {
            for grade in Grade::ALL {
                for member in [Member::Hole, Member::Shaft] {
                    let class = ToleranceClass { member, letter, grade };
                    assert_eq!(parse(&class.to_string()), Ok(class));
                }
            }
        }
        assert_eq!(parse(" js01 ").unwrap().to_string(), "js01");
    }

    #[test]
    fn numbered_grades_are_those_of_their_name() {
        for number in 1..=18 {
            assert_eq!(Grade::numbered(number).unwrap().name(), number.to_string());
        }
        assert_eq!(Grade::numbered(0), None);
        assert_eq!(Grade::numbered(19), None);
    }

    #[test]
    fn faults_say_what_is_wrong_and_what_was_meant() {
        for (text, reason, help) in [
            ("Js7", "holes have capital letters", "`JS7` for a hole or `js7` for a shaft"),
            ("H 7", "a blank does not belong", "write `H7`"),
            ("H", "the grade is missing", "a letter and a grade"),
            ("H19", "no grade `19`", "a letter and a grade"),
            ("H06", "no grade `06`", "a letter and a grade"),
            ("w6", "no deviation `w`", "deviations are a, b"),
            ("sj6", "no deviation `sj`", "did you mean the deviation `s`"),
            ("7", "must begin with the letter", "a letter and a grade"),
            ("\u{41d}7", "U+041D", "a letter and a grade"),
            ("", "must begin with the letter", "a letter and a grade"),
        ] {
            let error = parse(text).unwrap_err();
            assert!(error.to_string().contains(reason), "{text}: {error}");
            assert!(error.help().unwrap().contains(help), "{text}: {:?}", error.help());
        }
    }
}
