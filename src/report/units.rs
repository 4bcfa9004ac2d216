//! Numbers of the findings in the units the reader asked for, typeset.

use super::typeset::{self, THIN};
use crate::quantity::{self, DisplayUnit, UnitSystem, display_unit, show};

/// What a number measures, for the digits and the unit it is shown with.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) enum Measure {
    /// A size on a drawing, without trailing zeros.
    Size,
    /// A size with its deviation: at least three decimals of a millimetre or four of an inch.
    Limit,
    Deviation,
    Roughness,
    Pressure,
    Modulus,
    Force,
    Torque,
    Speed,
    Temperature,
    Density,
    Expansion,
    Conductivity,
    SpecificHeat,
    Angle,
    Number,
}

/// Number and unit as typeset.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(crate) struct Reading {
    pub number: String,
    pub unit: String,
}

impl Reading {
    /// Both in one line, a thin space between; the sign of degrees stands close, a power of ten is a factor.
    pub(crate) fn text(&self) -> String {
        match self.unit.as_str() {
            "" => self.number.clone(),
            "°" => format!("{}°", self.number),
            power if power.starts_with("10") => format!("{}·{power}", self.number),
            unit => format!("{}{THIN}{unit}", self.number),
        }
    }
}

/// The reader's units.
#[derive(Debug, Clone, Copy)]
pub(crate) struct Units {
    pub system: UnitSystem,
}

impl Units {
    pub(crate) fn reading(self, measure: Measure, si: f64) -> Reading {
        let si = settled(measure, si);
        let plain = match (measure, shared(measure)) {
            (Measure::Limit, _) => self.limit(si),
            (_, Some(measure)) => show(measure, si, self.system).number,
            _ => quantity::number(self.on_axis(measure, si), 4),
        };
        Reading { number: typeset::number(&plain), unit: self.unit(measure) }
    }

    pub(crate) fn text(self, measure: Measure, si: f64) -> String {
        self.reading(measure, si).text()
    }

    /// A computed number for a sentence or a picture: three significant digits for
    /// pressure, force, torque and a computed length.
    pub(crate) fn brief(self, measure: Measure, si: f64) -> Reading {
        match measure {
            Measure::Pressure | Measure::Force | Measure::Torque | Measure::Size => {
                let plain = quantity::number(self.on_axis(measure, settled(measure, si)), 3);
                Reading { number: typeset::number(&plain), unit: self.unit(measure) }
            }
            _ => self.reading(measure, si),
        }
    }

    /// The value on an axis.
    pub(crate) fn on_axis(self, measure: Measure, si: f64) -> f64 {
        self.scale(measure).of(si)
    }

    /// The unit, for an axis or the head of a column.
    pub(crate) fn unit(self, measure: Measure) -> String {
        self.scale(measure).name.to_owned()
    }

    /// One decimal more than a size has at least, when the deviation needs it.
    fn limit(self, si: f64) -> String {
        let decimals = if self.system == UnitSystem::Metric { 4 } else { 5 };
        let text = format!("{:.decimals$}", self.on_axis(Measure::Limit, si));
        text.strip_suffix('0').map_or_else(|| text.clone(), str::to_owned)
    }

    fn scale(self, measure: Measure) -> DisplayUnit {
        if let Some(measure) = shared(measure) {
            return display_unit(measure, self.system);
        }
        let (name, per_si) = match self.system {
            UnitSystem::Metric => metric(measure),
            UnitSystem::Inch => inch(measure),
        };
        DisplayUnit { name, per_si, offset: 0.0 }
    }
}

/// Zero in place of what rounding has left of it: less than 1 Pa, 1 mN or 1 mN·m.
fn settled(measure: Measure, si: f64) -> f64 {
    let least = match measure {
        Measure::Pressure => 1.0,
        Measure::Force | Measure::Torque => 1e-3,
        _ => 0.0,
    };
    if si.abs() < least { 0.0 } else { si }
}

/// The measure that other outputs show too.
fn shared(measure: Measure) -> Option<quantity::Measure> {
    Some(match measure {
        Measure::Size | Measure::Limit => quantity::Measure::Size,
        Measure::Deviation => quantity::Measure::Deviation,
        Measure::Pressure => quantity::Measure::Pressure,
        Measure::Force => quantity::Measure::Force,
        Measure::Torque => quantity::Measure::Torque,
        Measure::Speed => quantity::Measure::Speed,
        Measure::Temperature => quantity::Measure::Temperature,
        _ => return None,
    })
}

const DEGREES: f64 = 180.0 / std::f64::consts::PI;

fn metric(measure: Measure) -> (&'static str, f64) {
    match measure {
        Measure::Roughness => ("µm", 1e6),
        Measure::Modulus => ("GPa", 1e-9),
        Measure::Density => ("kg/m³", 1.0),
        Measure::Expansion => ("10⁻⁶/K", 1e6),
        Measure::Conductivity => ("W/(m·K)", 1.0),
        Measure::SpecificHeat => ("J/(kg·K)", 1.0),
        Measure::Angle => ("°", DEGREES),
        _ => ("", 1.0),
    }
}

/// Factors from 1 in = 25.4 mm, 1 lb = 0.45359237 kg, 1 lbf/in² = 6894.757293168 Pa, 1 Btu = 1055.05585262 J and
/// 1 °F = 5/9 K (NIST Special Publication 811, 2008, appendix B.8).
fn inch(measure: Measure) -> (&'static str, f64) {
    const POUND: f64 = 0.453_592_37;
    const BTU: f64 = 1_055.055_852_62;
    match measure {
        Measure::Roughness => ("µin", 1e6 / 0.0254),
        Measure::Modulus => ("10⁶ psi", 1e-6 / 6_894.757_293_168),
        Measure::Density => ("lb/in³", 0.0254 * 0.0254 * 0.0254 / POUND),
        Measure::Expansion => ("10⁻⁶/°F", 1e6 / 1.8),
        Measure::Conductivity => ("Btu/(h·ft·°F)", 3600.0 * 0.3048 / (1.8 * BTU)),
        Measure::SpecificHeat => ("Btu/(lb·°F)", POUND / (1.8 * BTU)),
        Measure::Angle => ("°", DEGREES),
        _ => ("", 1.0),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    const METRIC: Units = Units { system: UnitSystem::Metric };
    const INCH: Units = Units { system: UnitSystem::Inch };

    #[test]
    fn limits_keep_the_decimals_of_the_trade() {
        assert_eq!(METRIC.text(Measure::Limit, 0.060), "60.000\u{202F}mm");
        assert_eq!(METRIC.text(Measure::Limit, 0.0600125), "60.0125\u{202F}mm");
        assert_eq!(INCH.text(Measure::Limit, 2.0 * 0.0254), "2.0000\u{202F}in");
    }

    #[test]
    fn what_rounding_leaves_is_zero() {
        assert_eq!(METRIC.text(Measure::Pressure, -3.7e-9), "0\u{202F}MPa");
        assert_eq!(METRIC.brief(Measure::Pressure, 53.254e6).text(), "53.3\u{202F}MPa");
    }

    #[test]
    fn degrees_stand_close_and_temperatures_do_not() {
        assert_eq!(METRIC.text(Measure::Angle, 5f64.to_radians()), "5°");
        assert_eq!(METRIC.text(Measure::Temperature, 194.65), "−78.5\u{202F}°C");
    }

    /// NIST SP 811, appendix B.8: 1 Btu/(lb·°F) = 4186.8 J/(kg·K); 1 Btu/(h·ft·°F) = 1.730735 W/(m·K);
    /// 1 lb/in³ = 2.767990e4 kg/m³.
    #[test]
    fn inch_factors_agree_with_the_published_ones() {
        approx::assert_relative_eq!(INCH.on_axis(Measure::SpecificHeat, 4186.8), 1.0, max_relative = 1e-9);
        approx::assert_relative_eq!(INCH.on_axis(Measure::Conductivity, 1.730735), 1.0, max_relative = 1e-6);
        approx::assert_relative_eq!(INCH.on_axis(Measure::Density, 2.767990e4), 1.0, max_relative = 1e-6);
    }
}
