//! Plots: tolerance zones, stress through the walls, press force along the travel, diameters against temperature,
//! pressure along a stepped joint, clearance against time, what is left of the grip at work, recorded press-in curves.

mod along;
mod axis;
mod chart;
mod envelope;
mod handling;
mod population;
mod press;
mod records;
mod stress;
mod tags;
mod temperature;
mod walls;
mod windows;
mod zones;

use maud::Markup;

use crate::findings::Findings;

pub use along::along;
pub use envelope::envelope;
pub use handling::handling;
pub use population::population;
pub use press::press_force;
pub use records::press_records;
pub use stress::stress;
pub use temperature::diameters;
pub use windows::interference_windows;
pub use zones::tolerance_zones;

/// Whether the hub may yield and does, so that its elastic stresses are not those it has.
pub(in crate::report) fn yields_by_design(findings: &Findings) -> bool {
    walls::plastic(findings).is_some()
}

/// A plot with the sentence that says what to see.
pub struct Plot {
    /// Title, as a heading.
    pub title: String,
    /// The plot as an `svg` element.
    pub svg: Markup,
    /// What to see, with its numbers.
    pub caption: String,
}
