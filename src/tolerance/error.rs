//! What can be wrong with a tolerance class, a fit or a size, with the values that were given.

use thiserror::Error;

use super::exact::{deviation_text, inches_text, micrometres_text, millimetres_text};
use super::{Limits, Member};

/// Why limits could not be given.
#[derive(Debug, Clone, PartialEq, Error)]
pub enum ToleranceError {
    /// The text is not a tolerance class of ISO 286.
    #[error("`{text}` is not a tolerance class: {reason}")]
    UnreadableClass {
        /// The text as given.
        text: String,
        /// What is wrong with it.
        reason: String,
        /// What was probably meant, or what a class looks like.
        help: String,
    },
    /// The text is not a fit.
    #[error("`{text}` is not a fit: {reason}")]
    UnreadableFit {
        /// The text as given.
        text: String,
        /// What is wrong with it.
        reason: String,
        /// What was probably meant, or what a fit looks like.
        help: String,
    },
    /// A class of the other member was given.
    #[error("`{class}` is a class for a {}, a {} is due here", .member.other(), .member)]
    WrongMember {
        /// The class as given.
        class: String,
        /// The member that is due.
        member: Member,
        /// The class with the letters that the member has.
        meant: String,
    },
    /// The nominal diameter is not covered by the standard's tables.
    #[error("the nominal diameter {} is outside {standard}, which covers {covers}", size_text(*.nominal, *.inch))]
    NominalOutOfRange {
        /// Nominal diameter, m.
        nominal: f64,
        /// The standard.
        standard: &'static str,
        /// The sizes it covers.
        covers: &'static str,
        /// Whether the standard counts in inches.
        inch: bool,
    },
    /// The class does not exist at that size.
    #[error("{class} is not defined at {}: {reason}", size_text(*.nominal, *.inch))]
    NotDefined {
        /// The class.
        class: String,
        /// Nominal diameter, m.
        nominal: f64,
        /// Where it is defined.
        reason: String,
        /// The nearest classes that are defined at that size.
        nearest: Vec<String>,
        /// Whether the standard counts in inches.
        inch: bool,
    },
    /// The class has tabulated values at that size, but the standard does not let it be used there.
    #[error("{class} is not used at {}: {reason}", millimetres_text(*.nominal))]
    NotUsed {
        /// The class.
        class: String,
        /// Nominal diameter, m.
        nominal: f64,
        /// The rule of the standard.
        reason: &'static str,
    },
    /// A class of ANSI B4.1 whose table is not carried.
    #[error("{class} is a class of ANSI B4.1, but its table is not carried: {reason}")]
    NotCarried {
        /// The class.
        class: String,
        /// Why not.
        reason: &'static str,
    },
    /// The lower deviation is above the upper one.
    #[error(
        "the {}'s lower deviation {} is above its upper deviation {}",
        .member, deviation_text(.limits.lower), deviation_text(.limits.upper)
    )]
    DeviationsReversed {
        /// Which member.
        member: Member,
        /// The deviations as given, m.
        limits: Limits,
    },
    /// The minimum size is above the maximum size.
    #[error(
        "the {}'s minimum size {} is above its maximum size {}",
        .member, millimetres_text(*.minimum), millimetres_text(*.maximum)
    )]
    SizesReversed {
        /// Which member.
        member: Member,
        /// Minimum size as given, m.
        minimum: f64,
        /// Maximum size as given, m.
        maximum: f64,
    },
    /// A deviation that is too large to be meant.
    #[error(
        "the {}'s deviation {} is {:.1} % of the nominal diameter {}, which looks like a slip of the unit",
        .member, deviation_text(*.deviation), 100.0 * .deviation.abs() / .nominal, millimetres_text(*.nominal)
    )]
    ImplausibleDeviation {
        /// Which member.
        member: Member,
        /// The deviation, m.
        deviation: f64,
        /// Nominal diameter, m.
        nominal: f64,
    },
    /// The uncertainty of a measurement is negative.
    #[error("the uncertainty {} is negative", micrometres_text(*.uncertainty))]
    NegativeUncertainty {
        /// The uncertainty as given, m.
        uncertainty: f64,
    },
    /// A number that is not finite, or a size that is not above zero.
    #[error("the {what} must be a finite number above zero, it is {value} m")]
    NotASize {
        /// What it is.
        what: &'static str,
        /// The value as given, m.
        value: f64,
    },
    /// A deviation or uncertainty that is not finite.
    #[error("the {what} must be a finite number, it is {value} m")]
    NotFinite {
        /// What it is.
        what: &'static str,
        /// The value as given, m.
        value: f64,
    },
    /// A table built into the program cannot be read; a test proves that this does not happen.
    #[error("the built-in table {table} cannot be read: {detail}")]
    BuiltInTable {
        /// Name of the table's file.
        table: &'static str,
        /// What is wrong.
        detail: String,
    },
}

const GIVE_LIMITS: &str = "give the limits themselves, as in \
     `{hole: {lower: 0 um, upper: 30 um}, shaft: {lower: 53 um, upper: 72 um}}`";

impl ToleranceError {
    /// The way out, when there is one.
    ///
    /// # Example
    /// ```
    /// use hubgrip::tolerance::FitCallout;
    /// let error = FitCallout::parse("s6/H7").unwrap_err();
    /// assert_eq!(error.help().as_deref(), Some("did you mean `H7/s6`?"));
    /// ```
    pub fn help(&self) -> Option<String> {
        match self {
            Self::UnreadableClass { help, .. } | Self::UnreadableFit { help, .. } => Some(help.clone()),
            Self::WrongMember { meant, .. } => Some(format!(
                "holes have capital letters, shafts small ones; did you mean `{meant}`?"
            )),
            Self::NominalOutOfRange { nominal, .. } => {
                (*nominal > 0.0).then(|| format!("nothing is extrapolated; {GIVE_LIMITS}"))
            }
            Self::NotDefined { nearest, .. } if nearest.is_empty() => None,
            Self::NotDefined { nearest, .. } => Some(format!("defined at this size: {}", nearest.join(", "))),
            Self::NotUsed { .. } => Some(
                "choose another class, or give the deviations themselves if the parts are made so".to_owned(),
            ),
            Self::NotCarried { .. } => Some(format!("from a printed copy, {GIVE_LIMITS}")),
            Self::DeviationsReversed { .. } => Some(
                "the lower deviation belongs to the smallest part, with its sign: `lower: -20 um, upper: -7 um`"
                    .to_owned(),
            ),
            Self::SizesReversed { .. } => Some("exchange the two sizes".to_owned()),
            Self::ImplausibleDeviation { .. } => Some(
                "deviations are counted from the nominal diameter; check the unit (um, mm, thou) and the diameter"
                    .to_owned(),
            ),
            Self::NegativeUncertainty { .. } => Some("write it without a sign: `uncertainty: 2 um`".to_owned()),
            Self::NotASize { .. } | Self::NotFinite { .. } => None,
            Self::BuiltInTable { .. } => Some("this is a fault of the program, please report it".to_owned()),
        }
    }
}

fn size_text(nominal: f64, inch: bool) -> String {
    if inch { inches_text(nominal) } else { millimetres_text(nominal) }
}
