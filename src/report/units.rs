//! Numbers of the findings in the units the reader asked for, typeset.

use super::typeset::{self, THIN};
use crate::quantity::UnitSystem;

/// What a number measures, for the digits and the unit it is shown with.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) enum Measure {
    Size,
    /// A size with its deviation.
    Limit,
    Deviation,
    Roughness,
    Pressure,
    Modulus,
    Force,
    Torque,
    Temperature,
    Density,
    Expansion,
    Conductivity,
    SpecificHeat,
    Angle,
    Number,
    Work,
}

/// Number and unit as typeset.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(crate) struct Reading {
    pub number: String,
    pub unit: String,
}

impl Reading {
    /// Both in one line, a thin space between.
    pub(crate) fn text(&self) -> String {
        if self.unit.is_empty() { self.number.clone() } else { format!("{}{THIN}{}", self.number, self.unit) }
    }
}

/// The reader's units.
#[derive(Debug, Clone, Copy)]
pub(crate) struct Units {
    pub system: UnitSystem,
}

impl Units {
    pub(crate) fn reading(self, measure: Measure, si: f64) -> Reading {
        let (value, unit) = self.plain(measure, si);
        Reading { number: typeset::number(&value), unit: unit.to_owned() }
    }

    pub(crate) fn text(self, measure: Measure, si: f64) -> String {
        self.reading(measure, si).text()
    }

    /// The value on an axis.
    pub(crate) fn on_axis(self, measure: Measure, si: f64) -> f64 {
        let (factor, offset, _) = self.scale(measure);
        si * factor + offset
    }

    /// The unit, written for an axis.
    pub(crate) fn unit(self, measure: Measure) -> String {
        self.scale(measure).2.to_owned()
    }

    fn plain(self, measure: Measure, si: f64) -> (String, &'static str) {
        let (factor, offset, unit) = self.scale(measure);
        let value = si * factor + offset;
        let decimals = match measure {
            Measure::Size => 3,
            Measure::Limit if self.system == UnitSystem::Metric => 3,
            Measure::Limit => 4,
            Measure::Deviation => 1,
            Measure::Temperature => 0,
            Measure::Number => 2,
            _ => (2.0 - value.abs().max(1e-9).log10().floor()).clamp(0.0, 6.0) as usize,
        };
        let text = format!("{value:.decimals$}");
        let text = if measure == Measure::Size && text.contains('.') {
            text.trim_end_matches('0').trim_end_matches('.').to_owned()
        } else {
            text
        };
        (text, unit)
    }

    fn scale(self, measure: Measure) -> (f64, f64, &'static str) {
        let metric = self.system == UnitSystem::Metric;
        match measure {
            Measure::Size | Measure::Limit if metric => (1e3, 0.0, "mm"),
            Measure::Size | Measure::Limit => (1.0 / 0.0254, 0.0, "in"),
            Measure::Deviation if metric => (1e6, 0.0, "µm"),
            Measure::Deviation => (1e3 / 0.0254, 0.0, "thou"),
            Measure::Roughness if metric => (1e6, 0.0, "µm"),
            Measure::Roughness => (1e6 / 0.0254, 0.0, "µin"),
            Measure::Pressure if metric => (1e-6, 0.0, "MPa"),
            Measure::Pressure => (1.0 / 6894757.293168, 0.0, "ksi"),
            Measure::Modulus if metric => (1e-9, 0.0, "GPa"),
            Measure::Modulus => (1.0 / 6894757.293168, 0.0, "ksi"),
            Measure::Force if metric => (1e-3, 0.0, "kN"),
            Measure::Force => (1.0 / 4.4482216152605, 0.0, "lbf"),
            Measure::Torque if metric => (1.0, 0.0, "N·m"),
            Measure::Torque => (1.0 / 1.3558179483314004, 0.0, "lbf·ft"),
            Measure::Temperature if metric => (1.0, -273.15, "°C"),
            Measure::Temperature => (1.8, -459.67, "°F"),
            Measure::Density => (1.0, 0.0, "kg/m³"),
            Measure::Expansion => (1e6, 0.0, "10⁻⁶/K"),
            Measure::Conductivity => (1.0, 0.0, "W/(m·K)"),
            Measure::SpecificHeat => (1.0, 0.0, "J/(kg·K)"),
            Measure::Angle => (180.0 / std::f64::consts::PI, 0.0, "°"),
            Measure::Number => (1.0, 0.0, ""),
            Measure::Work => (1.0, 0.0, "J"),
        }
    }
}
