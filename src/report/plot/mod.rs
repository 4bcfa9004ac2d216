//! Plots: tolerance zones, stress through the walls, press force along the travel, diameters against temperature.

mod axis;
mod chart;
mod press;
mod stress;
mod tags;
mod temperature;
mod walls;
mod zones;

use maud::Markup;

pub use press::press_force;
pub use stress::stress;
pub use temperature::diameters;
pub use zones::tolerance_zones;

/// A plot with the sentence that says what to see.
pub struct Plot {
    /// Title, as a heading.
    pub title: String,
    /// The plot as an `svg` element.
    pub svg: Markup,
    /// What to see, with its numbers.
    pub caption: String,
}
