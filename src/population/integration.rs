//! Distributions as piecewise polynomials: added, mapped and integrated with full accuracy far into the tails.
//!
//! Between two kinks (the ends of a support, and the sums of such ends) a density is analytic, so it is held there
//! as Legendre polynomials on panels that are halved until the series has converged. A convolution is split at
//! every kink of both parts, so that Gauss–Legendre quadrature integrates the product of the two polynomials
//! exactly.

pub mod curve;
pub mod law;
pub mod quadrature;
