//! Plots: tolerance zones, stress through the walls, press force along the travel, diameters against temperature,
//! clearance against time, what is left of the grip at work.

mod axis;
mod chart;
mod envelope;
mod handling;
mod population;
mod press;
mod stress;
mod tags;
mod temperature;
mod windows;
mod zones;

use maud::Markup;

pub use envelope::envelope;
pub use handling::handling;
pub use population::population;
pub use press::press_force;
pub use stress::stress;
pub use temperature::diameters;
pub use windows::interference_windows;
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
