//! A fit as written on a drawing, given by its limits or measured, resolved to limits at a nominal diameter.

mod text;

use std::fmt;
use std::str::FromStr;

use super::ansi_b4_1::AnsiClass;
use super::exact::{self, deviation_text, inches_text, micrometres_text, millimetres_text};
use super::iso286::ToleranceClass;
use super::{FitLimits, Limits, Member, ToleranceError};
use crate::quantity::UnitSystem;

/// A deviation of this share of the nominal diameter is taken for a slip of the unit (common practice, no
/// source): the interferences that hold a joint are of the order of a thousandth of the diameter.
const IMPLAUSIBLE_SHARE: f64 = 0.05;

/// A fit: two tolerance classes, a class of ANSI B4.1, each member for itself, or two measured parts.
///
/// # Example
/// ```
/// use hubgrip::tolerance::FitCallout;
/// let fit = FitCallout::parse("H7/s6").unwrap();
/// let resolved = fit.resolve(0.060).unwrap();
/// let interference = resolved.limits.interference();
/// assert_eq!((interference.loosest, interference.tightest), (23e-6, 72e-6));
/// assert_eq!(resolved.shaft_source, "ISO 286, s6, over 50 to 65 mm");
/// assert_eq!(FitCallout::parse("fn4").unwrap().to_string(), "FN 4");
/// ```
#[derive(Debug, Clone, PartialEq)]
pub enum FitCallout {
    /// A hole class and a shaft class of ISO 286, such as `H7/s6` or `S7/h6`.
    Iso {
        /// Class of the hole.
        hole: ToleranceClass,
        /// Class of the shaft.
        shaft: ToleranceClass,
    },
    /// A class of ANSI B4.1, such as `FN 4`.
    Ansi(AnsiClass),
    /// Each member for itself.
    Members {
        /// The hole.
        hole: MemberCallout,
        /// The shaft.
        shaft: MemberCallout,
    },
    /// Two measured parts. The loosest pair is hole + u with shaft − u, the tightest hole − u with shaft + u.
    Measured {
        /// Measured diameter of the hole, m.
        hole: f64,
        /// Measured diameter of the shaft, m.
        shaft: f64,
        /// Uncertainty u of each of the two diameters, m, not negative.
        uncertainty: f64,
    },
}

/// One member of a fit.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum MemberCallout {
    /// A tolerance class of ISO 286, such as `H7`.
    Class(ToleranceClass),
    /// Lower and upper deviation from the nominal diameter, m.
    Deviations(Limits),
    /// Limits of size.
    Sizes {
        /// Minimum limit of size, m.
        minimum: f64,
        /// Maximum limit of size, m.
        maximum: f64,
    },
}

/// A fit resolved at a nominal diameter.
#[derive(Debug, Clone, PartialEq)]
pub struct Resolved {
    /// Nominal diameter and limits of both members.
    pub limits: FitLimits,
    /// Where the limits of the hole come from.
    pub hole_source: String,
    /// Where the limits of the shaft come from.
    pub shaft_source: String,
    /// What a user of these limits should know; full sentences.
    pub remarks: Vec<String>,
}

/// One member resolved at a nominal diameter.
#[derive(Debug, Clone, PartialEq)]
pub struct ResolvedMember {
    /// Limits of the member, m from nominal.
    pub limits: Limits,
    /// Where they come from.
    pub source: String,
    /// What a user of these limits should know; full sentences.
    pub remarks: Vec<String>,
}

impl FitCallout {
    /// Reads a fit as written on a drawing: `H7/s6`, `H7-s6`, `S7/h6`, `FN 4`.
    ///
    /// The hole stands first and has capital letters. The nominal diameter is not part of the text.
    ///
    /// # Errors
    /// What is wrong, and in its help what was probably meant.
    pub fn parse(text: &str) -> Result<Self, ToleranceError> {
        text::fit(text)
    }

    /// A fit of two members, each for itself.
    pub fn members(hole: MemberCallout, shaft: MemberCallout) -> Self {
        match (hole, shaft) {
            (MemberCallout::Class(hole), MemberCallout::Class(shaft)) => Self::Iso { hole, shaft },
            _ => Self::Members { hole, shaft },
        }
    }

    /// A fit by the deviations of both members from the nominal diameter, m.
    pub fn deviations(hole: Limits, shaft: Limits) -> Self {
        Self::members(MemberCallout::Deviations(hole), MemberCallout::Deviations(shaft))
    }

    /// Two measured parts with the uncertainty of each diameter, m.
    pub fn measured(hole: f64, shaft: f64, uncertainty: f64) -> Self {
        Self::Measured { hole, shaft, uncertainty }
    }

    /// Limits of both members at a nominal diameter, m, with their sources.
    ///
    /// Classes of ISO 286 are looked up at the size in millimetres, classes of ANSI B4.1 at the size in
    /// inches, whatever unit the nominal diameter was written in. Limits that are given are kept as they are;
    /// sizes become deviations to the femtometre.
    ///
    /// # Errors
    /// A nominal diameter that the standard does not cover, a class that is not defined there, a class of the
    /// wrong member, limits in the wrong order, a deviation of 5 % of the nominal diameter or more (common
    /// practice, no source), a negative uncertainty, a number that is not finite.
    pub fn resolve(&self, nominal: f64) -> Result<Resolved, ToleranceError> {
        let (hole, shaft) = match *self {
            Self::Ansi(class) => return resolve_ansi(class, nominal),
            Self::Iso { hole, shaft } => (MemberCallout::Class(hole), MemberCallout::Class(shaft)),
            Self::Members { hole, shaft } => (hole, shaft),
            Self::Measured { hole, shaft, uncertainty } => {
                return resolve_measured(hole, shaft, uncertainty, nominal);
            }
        };
        Ok(joined(hole.resolve(Member::Hole, nominal)?, shaft.resolve(Member::Shaft, nominal)?, nominal))
    }

    /// As [`FitCallout::resolve`], with a remark when the standard counts in other units than the nominal
    /// diameter was given in.
    ///
    /// # Errors
    /// As [`FitCallout::resolve`].
    ///
    /// # Example
    /// ```
    /// use hubgrip::{quantity::UnitSystem, tolerance::FitCallout};
    /// let fit = FitCallout::parse("FN 2").unwrap();
    /// let remarks = fit.resolve_given_in(0.060, UnitSystem::Metric).unwrap().remarks;
    /// assert_eq!(remarks, ["The inch tables of ANSI B4.1 were entered at 2.362205 in (60 mm)."]);
    /// ```
    pub fn resolve_given_in(&self, nominal: f64, given_in: UnitSystem) -> Result<Resolved, ToleranceError> {
        let mut resolved = self.resolve(nominal)?;
        let (inches, millimetres) = (inches_text(nominal), millimetres_text(nominal));
        let remark = match (given_in, self) {
            (UnitSystem::Metric, Self::Ansi(_)) => {
                Some(format!("The inch tables of ANSI B4.1 were entered at {inches} ({millimetres})."))
            }
            (UnitSystem::Inch, fit) if fit.has_iso_class() => {
                Some(format!("The metric tables of ISO 286 were entered at {millimetres} ({inches})."))
            }
            _ => None,
        };
        resolved.remarks.extend(remark);
        Ok(resolved)
    }

    fn has_iso_class(&self) -> bool {
        match self {
            Self::Iso { .. } => true,
            Self::Members { hole, shaft } => {
                [hole, shaft].iter().any(|member| matches!(member, MemberCallout::Class(_)))
            }
            Self::Ansi(_) | Self::Measured { .. } => false,
        }
    }
}

impl MemberCallout {
    /// Reads the class of one member: `H7` for a hole, `s6` for a shaft.
    ///
    /// # Errors
    /// A text that is not a class, or a class of the other member.
    ///
    /// # Example
    /// ```
    /// use hubgrip::tolerance::{Member, MemberCallout};
    /// let shaft = MemberCallout::parse("s6", Member::Shaft).unwrap();
    /// assert_eq!(shaft.resolve(Member::Shaft, 0.060).unwrap().limits.upper, 72e-6);
    /// assert!(MemberCallout::parse("s6", Member::Hole).is_err());
    /// ```
    pub fn parse(text: &str, member: Member) -> Result<Self, ToleranceError> {
        let class: ToleranceClass = text.parse()?;
        of_member(class, member).map(Self::Class)
    }

    /// Limits of the member at a nominal diameter, m, with their source.
    ///
    /// # Errors
    /// As [`FitCallout::resolve`].
    pub fn resolve(&self, member: Member, nominal: f64) -> Result<ResolvedMember, ToleranceError> {
        match *self {
            Self::Class(class) => resolve_class(of_member(class, member)?, nominal),
            Self::Deviations(limits) => {
                check_size("nominal diameter", nominal)?;
                check_deviations(member, limits, nominal)?;
                Ok(plain(limits, "deviations as given"))
            }
            Self::Sizes { minimum, maximum } => {
                check_size("nominal diameter", nominal)?;
                let limits = limits_of_sizes(member, minimum, maximum, nominal)?;
                Ok(plain(limits, "limits of size as given"))
            }
        }
    }
}

fn of_member(class: ToleranceClass, member: Member) -> Result<ToleranceClass, ToleranceError> {
    if class.member == member {
        return Ok(class);
    }
    let meant = class.mirrored().to_string();
    Err(ToleranceError::WrongMember { class: class.to_string(), member, meant })
}

fn resolve_class(class: ToleranceClass, nominal: f64) -> Result<ResolvedMember, ToleranceError> {
    let limits = class.limits(nominal)?;
    let step = class.step_text(nominal).unwrap_or_default();
    Ok(ResolvedMember {
        limits,
        source: format!("ISO 286, {class}, {step}"),
        remarks: class.remarks(nominal),
    })
}

fn resolve_ansi(class: AnsiClass, nominal: f64) -> Result<Resolved, ToleranceError> {
    let row = class.row(nominal)?;
    let source = format!("ANSI B4.1, {class}, {}", row.step_text());
    Ok(Resolved {
        limits: class.limits(nominal)?,
        hole_source: source.clone(),
        shaft_source: source,
        remarks: class.remarks(nominal),
    })
}

fn resolve_measured(
    hole: f64,
    shaft: f64,
    uncertainty: f64,
    nominal: f64,
) -> Result<Resolved, ToleranceError> {
    check_size("nominal diameter", nominal)?;
    check_size("measured diameter of the hole", hole)?;
    check_size("measured diameter of the shaft", shaft)?;
    check_finite("uncertainty", uncertainty)?;
    if uncertainty < 0.0 {
        return Err(ToleranceError::NegativeUncertainty { uncertainty });
    }
    let part = |member, size: f64| -> Result<ResolvedMember, ToleranceError> {
        let deviation = exact::size_difference(size, nominal);
        let limits = Limits {
            lower: exact::deviation_difference(deviation, uncertainty),
            upper: exact::deviation_difference(deviation, -uncertainty),
        };
        check_deviations(member, limits, nominal)?;
        let source = format!("measured {} ± {}", millimetres_text(size), micrometres_text(uncertainty));
        Ok(plain(limits, &source))
    };
    Ok(joined(part(Member::Hole, hole)?, part(Member::Shaft, shaft)?, nominal))
}

fn joined(hole: ResolvedMember, shaft: ResolvedMember, nominal: f64) -> Resolved {
    let mut remarks = hole.remarks;
    remarks.extend(shaft.remarks);
    Resolved {
        limits: FitLimits { nominal, hole: hole.limits, shaft: shaft.limits },
        hole_source: hole.source,
        shaft_source: shaft.source,
        remarks,
    }
}

fn plain(limits: Limits, source: &str) -> ResolvedMember {
    ResolvedMember { limits, source: source.to_owned(), remarks: Vec::new() }
}

fn limits_of_sizes(
    member: Member,
    minimum: f64,
    maximum: f64,
    nominal: f64,
) -> Result<Limits, ToleranceError> {
    check_size("minimum size", minimum)?;
    check_size("maximum size", maximum)?;
    if minimum > maximum {
        return Err(ToleranceError::SizesReversed { member, minimum, maximum });
    }
    let limits = Limits {
        lower: exact::size_difference(minimum, nominal),
        upper: exact::size_difference(maximum, nominal),
    };
    check_deviations(member, limits, nominal)?;
    Ok(limits)
}

fn check_deviations(member: Member, limits: Limits, nominal: f64) -> Result<(), ToleranceError> {
    check_finite("lower deviation", limits.lower)?;
    check_finite("upper deviation", limits.upper)?;
    if limits.lower > limits.upper {
        return Err(ToleranceError::DeviationsReversed { member, limits });
    }
    for deviation in [limits.lower, limits.upper] {
        if deviation.abs() >= IMPLAUSIBLE_SHARE * nominal {
            return Err(ToleranceError::ImplausibleDeviation { member, deviation, nominal });
        }
    }
    Ok(())
}

fn check_size(what: &'static str, value: f64) -> Result<(), ToleranceError> {
    if value.is_finite() && value > 0.0 { Ok(()) } else { Err(ToleranceError::NotASize { what, value }) }
}

fn check_finite(what: &'static str, value: f64) -> Result<(), ToleranceError> {
    if value.is_finite() { Ok(()) } else { Err(ToleranceError::NotFinite { what, value }) }
}

impl FromStr for FitCallout {
    type Err = ToleranceError;

    /// As [`FitCallout::parse`].
    fn from_str(text: &str) -> Result<Self, ToleranceError> {
        Self::parse(text)
    }
}

impl fmt::Display for FitCallout {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::Iso { hole, shaft } => write!(f, "{hole}/{shaft}"),
            Self::Ansi(class) => write!(f, "{class}"),
            Self::Members { hole, shaft } => write!(f, "hole {hole}, shaft {shaft}"),
            Self::Measured { hole, shaft, uncertainty } => write!(
                f,
                "measured hole {}, shaft {}, ± {}",
                millimetres_text(*hole),
                millimetres_text(*shaft),
                micrometres_text(*uncertainty)
            ),
        }
    }
}

impl fmt::Display for MemberCallout {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::Class(class) => write!(f, "{class}"),
            Self::Deviations(limits) => {
                let lower = deviation_text(limits.lower);
                write!(f, "{} to {}", lower.trim_end_matches(" µm"), deviation_text(limits.upper))
            }
            Self::Sizes { minimum, maximum } => {
                let minimum = millimetres_text(*minimum);
                write!(f, "{} to {}", minimum.trim_end_matches(" mm"), millimetres_text(*maximum))
            }
        }
    }
}
