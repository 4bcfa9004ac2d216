use thiserror::Error;

/// Why a distribution was refused.
#[derive(Debug, Clone, PartialEq, Error)]
pub enum DistributionError {
    /// A number is not finite.
    #[error("the {what} is not a finite number")]
    NotFinite {
        /// Which number.
        what: &'static str,
    },
    /// A number must be above zero.
    #[error("the {what} must be more than zero, it is {given}")]
    NotPositive {
        /// Which number.
        what: &'static str,
        /// What was given.
        given: f64,
    },
    /// The lower limit must lie below the upper.
    #[error("the limits must rise, {low} is followed by {high}")]
    LimitsReversed {
        /// Lower limit.
        low: f64,
        /// Upper limit.
        high: f64,
    },
    /// The cuts leave nothing of the normal.
    #[error("the cuts at {low} and {high} leave less than a millionth of the normal distribution")]
    NothingLeft {
        /// Lower cut.
        low: f64,
        /// Upper cut.
        high: f64,
    },
    /// The skewness is beyond what a skew normal can have.
    #[error("the skewness {given} is outside −0.95 to 0.95, which a skew normal can have")]
    Skewness {
        /// What was given.
        given: f64,
    },
    /// Cpk cannot exceed Cp.
    #[error("Cpk {cpk} is above Cp {cp}: a mean off the middle only lowers it")]
    CpkAboveCp {
        /// Cp.
        cp: f64,
        /// Cpk.
        cpk: f64,
    },
    /// A list without values.
    #[error("there is no measured value")]
    NoValues,
}
