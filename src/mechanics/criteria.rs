//! Strength criteria: von Mises, Tresca, greatest principal stress.

/// Criterion for ductile parts.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum DuctileCriterion {
    /// Greatest distortion energy.
    #[default]
    VonMises,
    /// Greatest shear stress.
    Tresca,
}
