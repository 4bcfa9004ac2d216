//! Text with units in, SI numbers out, and back for display.

/// Units shown to the reader.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum UnitSystem {
    /// Millimetres, newtons, megapascals, degrees Celsius.
    #[default]
    Metric,
    /// Inches, pounds-force, kilopounds per square inch, degrees Fahrenheit.
    Inch,
}
