//! Reading a fit as written on a drawing, and guessing what was meant when it cannot be read.

use super::FitCallout;
use crate::tolerance::ansi_b4_1::series_of;
use crate::tolerance::iso286::{Grade, Letter, ToleranceClass, describe};
use crate::tolerance::{Member, ToleranceError};

/// Signs that stand between hole and shaft: `H7/s6` (ISO 286-1), `H7-s6` (older drawings).
const SEPARATORS: [char; 3] = ['/', '-', '–'];

pub(super) fn fit(text: &str) -> Result<FitCallout, ToleranceError> {
    let text = text.trim();
    let fault = |reason: String, else_help: &str| ToleranceError::UnreadableFit {
        text: text.to_owned(),
        reason,
        help: guess(text)
            .map_or_else(|| else_help.to_owned(), |(hole, shaft)| format!("did you mean `{hole}/{shaft}`?")),
    };
    if series_of(text).is_some() {
        return Ok(FitCallout::Ansi(text.parse()?));
    }
    if text.starts_with(|c: char| c.is_ascii_digit() || c == 'Ø' || c == '⌀') {
        return Err(fault("the nominal diameter is not part of it".to_owned(), WHAT_A_FIT_IS));
    }
    let Some((hole, shaft)) = text.split_once(SEPARATORS) else {
        // A class alone that cannot be read is told as one: the stroke is not what is wrong with `H19`.
        return Err(match text.parse::<ToleranceClass>() {
            Err(error) if looks_like_a_class(text) => error,
            _ => fault(one_member_only(text), WHAT_A_FIT_IS),
        });
    };
    let class = |part: &str| -> Result<ToleranceClass, ToleranceError> {
        part.parse().map_err(|error: ToleranceError| {
            fault(error.to_string(), error.help().as_deref().unwrap_or(WHAT_A_FIT_IS))
        })
    };
    let (hole, shaft) = (class(hole)?, class(shaft)?);
    let reason = match (hole.member, shaft.member) {
        (Member::Hole, Member::Shaft) => return Ok(FitCallout::Iso { hole, shaft }),
        (Member::Shaft, Member::Hole) => "the hole stands first, then the shaft",
        (Member::Hole, Member::Hole) => "both are holes; the shaft has small letters",
        (Member::Shaft, Member::Shaft) => "both are shafts; the hole has capital letters",
    };
    Err(fault(reason.to_owned(), WHAT_A_FIT_IS))
}

const WHAT_A_FIT_IS: &str =
    "a fit is a hole and a shaft, as in `H7/s6`, or a class of ANSI B4.1, as in `FN 4`";

/// One or two letters and a number.
fn looks_like_a_class(text: &str) -> bool {
    let (letters, digits) = split_run(text, |c| c.is_ascii_alphabetic());
    (1..=2).contains(&letters.len()) && !digits.is_empty() && digits.bytes().all(|byte| byte.is_ascii_digit())
}

fn one_member_only(text: &str) -> String {
    if let Ok(class) = text.parse::<ToleranceClass>() {
        return format!("it names the {} only", class.member);
    }
    match text.chars().find(|c| !c.is_alphanumeric() && *c != ' ') {
        Some(odd) => format!("{} does not stand between hole and shaft", describe(odd)),
        None => "there is no `/` between hole and shaft".to_owned(),
    }
}

/// The two classes that a text holds when its signs, blanks, sizes and case are forgiven.
fn guess(text: &str) -> Option<(ToleranceClass, ToleranceClass)> {
    let words: String = text.chars().map(|c| if c.is_ascii_alphanumeric() { c } else { ' ' }).collect();
    let words = words.trim_start_matches(|c: char| !c.is_ascii_alphabetic());
    let (first, rest) = take_class(words)?;
    let (second, rest) = take_class(rest)?;
    if !rest.trim().is_empty() {
        return None;
    }
    let ((hole, _), (shaft, _)) = match (first.1, second.1) {
        (Member::Shaft, Member::Hole) => (second, first),
        _ => (first, second),
    };
    let of = |member, (letter, grade)| ToleranceClass { member, letter, grade };
    Some((of(Member::Hole, hole), of(Member::Shaft, shaft)))
}

/// A letter with its grade, and the member that its case means.
type Taken = ((Letter, Grade), Member);

fn take_class(text: &str) -> Option<(Taken, &str)> {
    let text = text.trim_start();
    let (letters, rest) = split_run(text, |c| c.is_ascii_alphabetic());
    let (digits, rest) = split_run(rest.trim_start(), |c| c.is_ascii_digit());
    let letter = Letter::from_name(&letters.to_ascii_lowercase())?;
    let member =
        if letters.starts_with(|c: char| c.is_ascii_uppercase()) { Member::Hole } else { Member::Shaft };
    Some((((letter, Grade::from_name(digits)?), member), rest))
}

fn split_run(text: &str, belongs: impl Fn(char) -> bool) -> (&str, &str) {
    text.split_at(text.find(|c| !belongs(c)).unwrap_or(text.len()))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_fit_is_written_as_it_is_read() {
        for (text, written) in [
            ("H7/s6", "H7/s6"),
            (" S7 / h6 ", "S7/h6"),
            ("H7-s6", "H7/s6"),
            ("JS7/h01", "JS7/h01"),
            ("FN 4", "FN 4"),
            ("rc5", "RC 5"),
            ("LN-2", "LN 2"),
        ] {
            assert_eq!(fit(text).unwrap().to_string(), written);
        }
    }

    #[test]
    fn faults_say_what_is_wrong_and_what_was_meant() {
        for (text, reason, help) in [
            ("s6/H7", "the hole stands first", "did you mean `H7/s6`?"),
            ("H7/S6", "both are holes", "did you mean `H7/s6`?"),
            ("h7/s6", "both are shafts", "did you mean `H7/s6`?"),
            ("H7 s6", "no `/` between", "did you mean `H7/s6`?"),
            ("H7s6", "no `/` between", "did you mean `H7/s6`?"),
            ("H7|s6", "`|` does not stand between", "did you mean `H7/s6`?"),
            ("H7\\s6", "`\\` does not stand between", "did you mean `H7/s6`?"),
            ("60 H7/s6", "nominal diameter is not part", "did you mean `H7/s6`?"),
            ("Ø60H7/s6", "nominal diameter is not part", "did you mean `H7/s6`?"),
            ("H 7/s 6", "a blank does not belong", "did you mean `H7/s6`?"),
            ("H7", "names the hole only", "a fit is a hole and a shaft"),
            ("s6", "names the shaft only", "a fit is a hole and a shaft"),
            ("H19", "there is no grade `19`; grades are 01, 0 and 1 to 18", "a letter and a grade"),
            ("I7", "ISO 286 has no deviation `I`", "deviations are a, b"),
            ("zz7", "ISO 286 has no deviation `zz`", "did you mean the deviation `z`"),
            ("H7/w6", "no deviation `w`", "deviations are"),
            ("H7/s19", "no grade `19`", "a class is a letter and a grade"),
            ("H7/s6/h6", "`/` does not belong", "a class is a letter and a grade"),
            ("FN 7", "no class `7` of FN", "the classes are FN 1 to FN 5"),
            ("", "no `/` between", "a fit is a hole and a shaft"),
            ("press fit", "no `/` between", "a fit is a hole and a shaft"),
        ] {
            let error = fit(text).unwrap_err();
            assert!(error.to_string().contains(reason), "{text}: {error}");
            assert!(error.help().unwrap().contains(help), "{text}: {:?}", error.help());
        }
    }
}
