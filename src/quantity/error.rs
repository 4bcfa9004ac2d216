//! Why a text is not a quantity.

use thiserror::Error;

use super::unit::Kind;

/// Why a text is not the quantity that is due; the message names the family of units.
#[derive(Debug, Clone, PartialEq, Error)]
pub enum QuantityError {
    /// Nothing is written.
    #[error("nothing is written where {} is due", .kind.phrase())]
    Empty {
        /// What is due.
        kind: Kind,
    },
    /// The text does not begin with a number.
    #[error("{given} is not {}: it does not begin with a number", .kind.phrase())]
    NoNumber {
        /// What is due.
        kind: Kind,
        /// The text.
        given: String,
    },
    /// A number without its unit.
    #[error("{given} has no unit: write {given} {unit}")]
    NoUnit {
        /// What is due.
        kind: Kind,
        /// The number as written.
        given: String,
        /// The unit to suggest.
        unit: &'static str,
    },
    /// A unit that is not known.
    #[error("{unit} is not a unit that is known; {} is due ({})", .kind.phrase(), .kind.unit_names())]
    UnknownUnit {
        /// What is due.
        kind: Kind,
        /// The unit as written.
        unit: String,
        /// A known unit that is close.
        near: Option<&'static str>,
    },
    /// A unit of another kind.
    #[error("{given} is {}; {} is due ({})", .found.phrase(), .kind.phrase(), .kind.unit_names())]
    WrongKind {
        /// What is due.
        kind: Kind,
        /// The text.
        given: String,
        /// What it is.
        found: Kind,
    },
    /// A unit behind a number that has none.
    #[error("{given} has a unit, but a plain number is due")]
    UnitNotDue {
        /// The text.
        given: String,
    },
    /// A comma, blank or underscore among the digits.
    #[error("{given} is not a number that is read: a decimal point, no grouping of digits")]
    NotPlainDecimal {
        /// The number as written.
        given: String,
        /// The text with a decimal point.
        meant: Option<String>,
    },
    /// A fraction of one or more, with zero below the line, or of another unit than inches and feet.
    #[error("{given} is not a fraction of an inch or a foot")]
    Fraction {
        /// The text.
        given: String,
    },
    /// A number so close to zero that a double cannot hold it.
    #[error("{given} is too close to zero to be held")]
    TooSmall {
        /// The text.
        given: String,
    },
    /// NaN, infinity or too great for a number.
    #[error("{given} is not a finite number; {} is due", .kind.phrase())]
    NotFinite {
        /// What is due.
        kind: Kind,
        /// The text.
        given: String,
    },
    /// A number far beyond all that a machine part can have.
    #[error("{given} is no number that a part can have")]
    TooGreat {
        /// The text.
        given: String,
    },
    /// A temperature below absolute zero.
    #[error("{given} is below absolute zero (-273.15 degC)")]
    BelowAbsoluteZero {
        /// The text.
        given: String,
    },
    /// A range whose first value is the greater one.
    #[error("the range {given} runs downwards")]
    RangeOrder {
        /// The text.
        given: String,
    },
    /// The text is not a deviation with both signs.
    #[error("{given} is not a pair of deviations")]
    NotPlusMinus {
        /// The text.
        given: String,
    },
}

pub(super) fn first_unit(kind: Kind) -> &'static str {
    kind.units().next().map_or("", |unit| unit.name)
}

impl QuantityError {
    /// The same fault where this unit is the likely one: micrometres for a roughness, which a suggestion of
    /// millimetres would make a thousand times too great.
    ///
    /// # Example
    /// ```
    /// use hubgrip::quantity::{Kind, parse};
    /// let error = parse(Kind::Length, "6.3").unwrap_err().suggesting("um");
    /// assert_eq!(error.to_string(), "6.3 has no unit: write 6.3 um");
    /// ```
    pub fn suggesting(self, unit: &'static str) -> Self {
        match self {
            Self::NoUnit { kind, given, .. } => Self::NoUnit { kind, given, unit },
            other => other,
        }
    }

    /// What would be right, when there is something to say.
    pub fn help(&self) -> Option<String> {
        match self {
            Self::Empty { kind } | Self::NoNumber { kind, .. } | Self::NotFinite { kind, .. } => {
                Some(format!("write a number{}", with_units(*kind)))
            }
            Self::NoUnit { kind, .. } => {
                Some(format!("the units of {} are {}", kind.phrase(), kind.unit_names()))
            }
            Self::UnknownUnit { near: Some(near), .. } => Some(format!("did you mean {near}?")),
            Self::WrongKind { found: Kind::Mass, kind: Kind::Force, .. } => {
                Some("a force in pounds is written lbf".to_owned())
            }
            Self::UnknownUnit { kind, .. } | Self::WrongKind { kind, .. } => {
                Some(format!("the units of {} are {}", kind.phrase(), kind.unit_names()))
            }
            Self::UnitNotDue { .. } => Some("write the number alone".to_owned()),
            Self::NotPlainDecimal { meant: Some(meant), .. } => Some(format!("write {meant}")),
            Self::NotPlainDecimal { meant: None, .. } => {
                Some("write the digits together, such as 1200.5".to_owned())
            }
            Self::Fraction { .. } => Some("write 3/8 in or 2-3/16 in, else a decimal number".to_owned()),
            Self::TooSmall { .. } => Some("write 0 if nothing is meant".to_owned()),
            Self::TooGreat { .. } => Some("check the exponent and the unit".to_owned()),
            Self::BelowAbsoluteZero { .. } => Some("temperatures are in degC, degF or K".to_owned()),
            Self::RangeOrder { .. } => Some("write the lesser value first, such as 0.08 to 0.14".to_owned()),
            Self::NotPlusMinus { .. } => Some("write ±10 um, +/- 10 um or +30 / -10 um".to_owned()),
        }
    }
}

fn with_units(kind: Kind) -> String {
    match kind {
        Kind::Number => String::new(),
        _ => format!(" with its unit ({})", kind.unit_names()),
    }
}

/// Longest part of a text that an error repeats, in characters.
const SHOWN: usize = 60;

/// A text as an error repeats it: trimmed, without control characters, not endless.
pub(super) fn shown(text: &str) -> String {
    let clean = text.trim().chars().map(|c| if c.is_control() { ' ' } else { c });
    let mut shown: String = clean.clone().take(SHOWN).collect();
    if clean.count() > SHOWN {
        shown.push('…');
    }
    shown
}
