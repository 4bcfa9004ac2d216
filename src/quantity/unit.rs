//! The table of units: every spelling that is read, with its exact size in SI units.

use std::f64::consts::PI;

/// What a number measures.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub enum Kind {
    /// A pure number, without a unit.
    Number,
    /// Length, m.
    Length,
    /// Force, N.
    Force,
    /// Torque, N·m.
    Torque,
    /// Pressure, stress or modulus of elasticity, Pa.
    Pressure,
    /// Absolute temperature, K.
    Temperature,
    /// Difference of two temperatures, K.
    TemperatureDifference,
    /// Rotational speed, rad/s.
    Speed,
    /// Velocity along a line, m/s.
    Velocity,
    /// Mass, kg.
    Mass,
    /// Time, s.
    Time,
    /// Density, kg/m³.
    Density,
    /// Coefficient of thermal expansion, 1/K.
    Expansion,
    /// Thermal conductivity, W/(m·K).
    Conductivity,
    /// Specific heat, J/(kg·K).
    SpecificHeat,
    /// Heat transfer coefficient, W/(m²·K).
    HeatTransfer,
    /// Angle, rad.
    Angle,
    /// Volume, m³.
    Volume,
}

impl Kind {
    /// Every kind, in the order of the table.
    pub const ALL: [Kind; 18] = [
        Kind::Number,
        Kind::Length,
        Kind::Force,
        Kind::Torque,
        Kind::Pressure,
        Kind::Temperature,
        Kind::TemperatureDifference,
        Kind::Speed,
        Kind::Velocity,
        Kind::Mass,
        Kind::Time,
        Kind::Density,
        Kind::Expansion,
        Kind::Conductivity,
        Kind::SpecificHeat,
        Kind::HeatTransfer,
        Kind::Angle,
        Kind::Volume,
    ];

    /// The kind with its article, such as `a length`.
    pub fn phrase(self) -> &'static str {
        match self {
            Self::Number => "a plain number",
            Self::Length => "a length",
            Self::Force => "a force",
            Self::Torque => "a torque",
            Self::Pressure => "a pressure",
            Self::Temperature => "a temperature",
            Self::TemperatureDifference => "a temperature difference",
            Self::Speed => "a rotational speed",
            Self::Velocity => "a velocity",
            Self::Mass => "a mass",
            Self::Time => "a time",
            Self::Density => "a density",
            Self::Expansion => "a coefficient of thermal expansion",
            Self::Conductivity => "a thermal conductivity",
            Self::SpecificHeat => "a specific heat",
            Self::HeatTransfer => "a heat transfer coefficient",
            Self::Angle => "an angle",
            Self::Volume => "a volume",
        }
    }

    /// The units of this kind, the one to suggest first; none for a pure number.
    pub fn units(self) -> impl Iterator<Item = &'static Unit> {
        UNITS.iter().filter(move |unit| unit.kind == self)
    }

    /// The names of its units, such as `mm, um, in, thou`; empty for a pure number.
    pub fn unit_names(self) -> String {
        self.units().map(|unit| unit.name).collect::<Vec<_>>().join(", ")
    }
}

/// How a number of a unit becomes a number of the SI unit.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Scale {
    /// Times a power of ten; done on the digits, so it is exact.
    PowerOfTen(i32),
    /// Times the first number, divided by the second; both are exact.
    Ratio(f64, f64),
    /// Times 2π, divided by the number.
    Turn(f64),
    /// Absolute temperature: (t + zero) times the first number, divided by the second.
    ///
    /// The zero is in hundredths, a whole number, so that 20 degC is 293.15 K to the last bit.
    Shifted {
        /// Zero of the scale above absolute zero, hundredths of its degree.
        zero_hundredths: f64,
        /// Numerator of the degree's size in K.
        numerator: f64,
        /// Denominator of the degree's size in K.
        denominator: f64,
    },
}

/// One unit.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Unit {
    /// The name that is suggested.
    pub name: &'static str,
    /// Other spellings that are read alike.
    ///
    /// Before a spelling is looked up, µ and μ are written u, the dots ·, ⋅, * and blanks as a full stop, ° as deg,
    /// ² and ³ as digits; brackets and ^ are dropped.
    pub aliases: &'static [&'static str],
    /// What it measures.
    pub kind: Kind,
    /// Its size in the SI unit.
    pub scale: Scale,
    /// Definition its size comes from.
    pub source: &'static str,
}

const SI: &str = "SI Brochure, 9th edition (2019), tables 4 and 7";
const WITH_SI: &str = "SI Brochure, 9th edition (2019), table 8";
const ROTATION: &str = "ISO 80000-3:2019, rotational frequency: one revolution is 2π rad";
const YARD_POUND: &str = "yard and pound agreement of 1959: 1 in = 25.4 mm, 1 lb = 0.45359237 kg exactly";
const POUND_FORCE: &str =
    "1 lb × 9.80665 m/s² (standard gravity, 3rd CGPM 1901) = 4.4482216152605 N exactly; 1 in = 25.4 mm";
const FAHRENHEIT: &str = "NIST SP 811 (2008), appendix B.8: T/K = (t/°F + 459.67)/1.8";
const CELSIUS: &str = "SI Brochure, 9th edition (2019), 2.3.1: t/°C = T/K − 273.15";
const BTU: &str = "NIST SP 811 (2008), appendix B.8: 1 Btu(IT) = 1055.05585262 J exactly, 1 degF = 5/9 K";
const LITRE_GALLON: &str = "NIST SP 811 (2008), appendix B.8: 1 gal(US) = 231 in³";

use Kind::*;
use Scale::{PowerOfTen, Ratio, Shifted, Turn};

const fn unit(
    kind: Kind,
    name: &'static str,
    aliases: &'static [&'static str],
    scale: Scale,
    source: &'static str,
) -> Unit {
    Unit { name, aliases, kind, scale, source }
}

/// Pound-force in N is this over 10¹³.
const LBF: f64 = 44_482_216_152_605.0;

/// Every unit, by kind, the one to suggest first.
#[rustfmt::skip]
pub const UNITS: &[Unit] = &[
    unit(Length, "mm", &[], PowerOfTen(-3), SI),
    unit(Length, "um", &["micron"], PowerOfTen(-6), SI),
    unit(Length, "in", &["inch", "\""], Ratio(254.0, 1e4), YARD_POUND),
    unit(Length, "thou", &["mil"], Ratio(254.0, 1e7), YARD_POUND),
    unit(Length, "m", &[], PowerOfTen(0), SI),
    unit(Length, "cm", &[], PowerOfTen(-2), SI),
    unit(Length, "nm", &[], PowerOfTen(-9), SI),
    unit(Length, "uin", &[], Ratio(254.0, 1e10), YARD_POUND),
    unit(Length, "ft", &[], Ratio(3048.0, 1e4), YARD_POUND),
    unit(Force, "N", &[], PowerOfTen(0), SI),
    unit(Force, "kN", &[], PowerOfTen(3), SI),
    unit(Force, "MN", &[], PowerOfTen(6), SI),
    unit(Force, "lbf", &[], Ratio(LBF, 1e13), POUND_FORCE),
    unit(Force, "kip", &["klbf"], Ratio(LBF, 1e10), POUND_FORCE),
    unit(Torque, "N.m", &["Nm"], PowerOfTen(0), SI),
    unit(Torque, "kN.m", &["kNm"], PowerOfTen(3), SI),
    unit(Torque, "N.mm", &["Nmm"], PowerOfTen(-3), SI),
    // LBF/10¹³ × 0.3048 = 1.3558179483314004
    unit(Torque, "lbf.ft", &["ft.lbf", "lb.ft", "ft.lb"], Ratio(3_389_544_870_828_501.0, 2.5e15), POUND_FORCE),
    // LBF/10¹³ × 0.0254
    unit(Torque, "lbf.in", &["in.lbf", "lb.in", "in.lb"], Ratio(1_129_848_290_276_167.0, 1e16), POUND_FORCE),
    unit(Pressure, "MPa", &["N/mm2"], PowerOfTen(6), SI),
    unit(Pressure, "GPa", &["kN/mm2"], PowerOfTen(9), SI),
    unit(Pressure, "Pa", &["N/m2"], PowerOfTen(0), SI),
    unit(Pressure, "kPa", &[], PowerOfTen(3), SI),
    unit(Pressure, "bar", &[], PowerOfTen(5), WITH_SI),
    // LBF/10¹³ over 0.0254² = 64516/10⁸
    unit(Pressure, "psi", &["lbf/in2"], Ratio(LBF, 6_451_600_000.0), POUND_FORCE),
    unit(Pressure, "ksi", &["kip/in2"], Ratio(LBF, 6_451_600.0), POUND_FORCE),
    unit(Pressure, "Mpsi", &["Msi"], Ratio(LBF, 6_451.6), POUND_FORCE),
    unit(Temperature, "degC", &["C", "deg.C"], Shifted { zero_hundredths: 27315.0, numerator: 1.0, denominator: 1.0 }, CELSIUS),
    unit(Temperature, "degF", &["F", "deg.F"], Shifted { zero_hundredths: 45967.0, numerator: 5.0, denominator: 9.0 }, FAHRENHEIT),
    unit(Temperature, "K", &[], PowerOfTen(0), SI),
    unit(TemperatureDifference, "K", &[], PowerOfTen(0), SI),
    unit(TemperatureDifference, "degC", &["C", "deg.C"], PowerOfTen(0), CELSIUS),
    unit(TemperatureDifference, "degF", &["F", "deg.F"], Ratio(5.0, 9.0), FAHRENHEIT),
    unit(Speed, "rpm", &["1/min", "/min", "rev/min", "r/min"], Turn(60.0), ROTATION),
    unit(Speed, "rad/s", &[], PowerOfTen(0), SI),
    unit(Speed, "1/s", &["/s", "rev/s", "r/s"], Turn(1.0), ROTATION),
    unit(Velocity, "mm/s", &[], PowerOfTen(-3), SI),
    unit(Velocity, "m/s", &[], PowerOfTen(0), SI),
    unit(Velocity, "in/s", &[], Ratio(254.0, 1e4), YARD_POUND),
    unit(Mass, "kg", &[], PowerOfTen(0), SI),
    unit(Mass, "g", &[], PowerOfTen(-3), SI),
    unit(Mass, "lb", &["lbs", "lbm"], Ratio(45_359_237.0, 1e8), YARD_POUND),
    unit(Mass, "t", &[], PowerOfTen(3), WITH_SI),
    unit(Time, "s", &[], PowerOfTen(0), SI),
    unit(Time, "ms", &[], PowerOfTen(-3), SI),
    unit(Time, "min", &[], Ratio(60.0, 1.0), WITH_SI),
    unit(Time, "h", &[], Ratio(3600.0, 1.0), WITH_SI),
    unit(Density, "kg/m3", &[], PowerOfTen(0), SI),
    unit(Density, "g/cm3", &["kg/dm3", "t/m3"], PowerOfTen(3), SI),
    // 0.45359237 over 0.0254³ = 16387064/10¹²
    unit(Density, "lb/in3", &["lbm/in3"], Ratio(453_592_370_000.0, 16_387_064.0), YARD_POUND),
    unit(Expansion, "/K", &["1/K", "/degC", "1/degC"], PowerOfTen(0), SI),
    unit(Expansion, "um/m.K", &["um/m/K", "um/m.degC", "ppm/K", "ppm/degC"], PowerOfTen(-6), SI),
    unit(Expansion, "/degF", &["1/degF"], Ratio(9.0, 5.0), FAHRENHEIT),
    unit(Expansion, "uin/in.degF", &["uin/in/degF", "ppm/degF"], Ratio(9.0, 5e6), FAHRENHEIT),
    unit(Conductivity, "W/m.K", &["W/m/K"], PowerOfTen(0), SI),
    // 1055.05585262 J over 3600 s, 0.3048 m and 5/9 K
    unit(Conductivity, "Btu/h.ft.degF", &[], Ratio(949_550_267_358.0, 548_640_000_000.0), BTU),
    unit(SpecificHeat, "J/kg.K", &["J/kg/K"], PowerOfTen(0), SI),
    unit(SpecificHeat, "kJ/kg.K", &["kJ/kg/K", "J/g.K"], PowerOfTen(3), SI),
    // 1055.05585262 J over 0.45359237 kg and 5/9 K
    unit(SpecificHeat, "Btu/lb.degF", &[], Ratio(41868.0, 10.0), BTU),
    unit(HeatTransfer, "W/m2.K", &["W/m2/K"], PowerOfTen(0), SI),
    // 1055.05585262 J over 3600 s, 0.3048² m² and 5/9 K
    unit(HeatTransfer, "Btu/h.ft2.degF", &[], Ratio(9_495_502_673_580.0, 1_672_254_720_000.0), BTU),
    unit(Angle, "deg", &[], Turn(360.0), WITH_SI),
    unit(Angle, "rad", &[], PowerOfTen(0), SI),
    unit(Volume, "l", &["L", "dm3"], PowerOfTen(-3), WITH_SI),
    unit(Volume, "m3", &[], PowerOfTen(0), SI),
    unit(Volume, "cm3", &["ml", "mL"], PowerOfTen(-6), SI),
    unit(Volume, "mm3", &[], PowerOfTen(-9), SI),
    unit(Volume, "in3", &[], Ratio(16_387_064.0, 1e12), YARD_POUND),
    unit(Volume, "US.gal", &[], Ratio(3_785_411_784.0, 1e12), LITRE_GALLON),
];

impl Unit {
    /// Every spelling, the name first.
    pub fn spellings(&self) -> impl Iterator<Item = &'static str> + use<> {
        std::iter::once(self.name).chain(self.aliases.iter().copied())
    }

    /// The number of this unit in an SI amount, not rounded to anything.
    pub fn from_si(&self, si: f64) -> f64 {
        match self.scale {
            PowerOfTen(exponent) if exponent >= 0 => si / 10f64.powi(exponent),
            PowerOfTen(exponent) => si * 10f64.powi(-exponent),
            Ratio(numerator, denominator) => si * denominator / numerator,
            Turn(parts) => si * parts / (2.0 * PI),
            Shifted { zero_hundredths, numerator, denominator } => {
                si * denominator / numerator - zero_hundredths / 100.0
            }
        }
    }
}

/// A spelling as it stands in the table: one sign for each dot, degree and micro sign.
pub(super) fn plain_spelling(given: &str) -> String {
    let mut plain = String::with_capacity(given.len());
    for character in without_brackets(given.trim()).chars() {
        match character {
            'µ' | 'μ' => plain.push('u'),
            '°' | 'º' => plain.push_str("deg"),
            '℃' => plain.push_str("degC"),
            '℉' => plain.push_str("degF"),
            '²' => plain.push('2'),
            '³' => plain.push('3'),
            '·' | '⋅' | '*' | '-' | '.' => push_dot(&mut plain),
            blank if blank.is_whitespace() => push_dot(&mut plain),
            '/' => {
                if plain.ends_with('.') {
                    plain.pop();
                }
                plain.push('/');
            }
            other => plain.push(other),
        }
    }
    plain
}

/// A product's dot, which blanks beside it or beside a stroke do not double.
fn push_dot(plain: &mut String) {
    if !plain.ends_with(['.', '/']) {
        plain.push('.');
    }
}

/// The spelling without `^` before an exponent and without the brackets around all that stands below a stroke.
fn without_brackets(given: &str) -> String {
    let plain = given.replace("^2", "2").replace("^3", "3").replace("/ (", "/(");
    match plain.split_once("/(").map(|(over, under)| (over, under.strip_suffix(')'))) {
        Some((over, Some(under))) if !under.contains(['(', ')']) => format!("{over}/{under}"),
        _ => plain,
    }
}

/// The unit of a kind with a spelling in the table.
pub(super) fn find(kind: Kind, spelling: &str) -> Option<&'static Unit> {
    kind.units().find(|unit| unit.spellings().any(|known| known == spelling))
}
