//! Clearance of a hot hub over a cold shaft, and the temperatures that open it.

use super::error::{AssemblyError, finite, positive};
use crate::material::{Expansion, Sourced};
use crate::numerics::root::bracketed;

/// Temperature of dry ice at atmospheric pressure, −78.5 °C, K (sublimation point; CRC Handbook of Chemistry
/// and Physics).
pub const DRY_ICE_TEMPERATURE: f64 = 194.65;

/// Temperature of boiling nitrogen at atmospheric pressure, −195.8 °C, K (NIST, normal boiling point).
pub const LIQUID_NITROGEN_TEMPERATURE: f64 = 77.36;

/// Diametral clearance of the parts at their own temperatures, m; negative while they still interfere.
///
/// c = D (1 + ε_h(T_h)) − (D + U)(1 + ε_s(T_s))
///
/// | symbol | meaning | unit | valid |
/// |---|---|---|---|
/// | D | diameter of the bore at 20 °C (the nominal diameter will do) | m | > 0 |
/// | U | diametral interference at 20 °C; negative is clearance | m | |U| < D |
/// | ε_h, ε_s | expansion strains of hub and shaft from 20 °C | – | from the curves |
/// | T_h, T_s | temperatures of hub and shaft | K | inside their curves |
///
/// Assumes each part at one temperature (the area mean, when it is not) and both parts free. Roughness is
/// not lost before the parts touch, so U is the interference of the sizes, without smoothing.
///
/// Source: geometry of two free discs; S. P. Timoshenko and J. N. Goodier, *Theory of Elasticity*, ch. 13.
///
/// # Errors
/// [`AssemblyError::OutsideCurve`] when a temperature lies outside its curve: nothing is extrapolated.
///
/// # Example
/// ```
/// use hubgrip::assembly::thermal::clearance;
/// use hubgrip::material::Expansion;
/// let steel = Expansion::from_mean(12e-6, 273.15, 573.15, "mean of 20 to 300 °C").unwrap();
/// let c = clearance(0.1, 100e-6, &steel, 418.15, &steel, 293.15).unwrap();
/// assert!((c - 50e-6).abs() < 1e-15);
/// ```
pub fn clearance(
    diameter: f64,
    interference: f64,
    hub: &Expansion,
    hub_temperature: f64,
    shaft: &Expansion,
    shaft_temperature: f64,
) -> Result<f64, AssemblyError> {
    positive("joint diameter (m)", diameter)?;
    finite("interference (m)", interference)?;
    positive("shaft diameter (m)", diameter + interference)?;
    let hub_strain = strain("hub", hub, hub_temperature)?;
    let shaft_strain = strain("shaft", shaft, shaft_temperature)?;
    // Written so that equal and opposite terms do not lose digits: D and D + U are alike to 1e-3.
    Ok(diameter * (hub_strain - shaft_strain) - interference * (1.0 + shaft_strain))
}

/// Lowest hub temperature (K) on its curve at which the diametral clearance `wanted` (m) opens.
///
/// Solves c(T_h) = c_wanted with [`clearance`] by a bracketed root on each piece of the hub's own curve.
///
/// # Errors
/// [`AssemblyError::CurveEnds`] when the curve ends before the clearance opens,
/// [`AssemblyError::AlwaysClear`] when it is exceeded over the whole curve, and as [`clearance`].
///
/// # Example
/// ```
/// use hubgrip::assembly::thermal::hub_temperature_for;
/// use hubgrip::material::Expansion;
/// let steel = Expansion::from_mean(12e-6, 273.15, 573.15, "mean of 20 to 300 °C").unwrap();
/// let temperature = hub_temperature_for(0.1, 100e-6, 50e-6, &steel, &steel, 293.15).unwrap();
/// assert!((temperature - 418.15).abs() < 1e-9);
/// ```
pub fn hub_temperature_for(
    diameter: f64,
    interference: f64,
    wanted: f64,
    hub: &Expansion,
    shaft: &Expansion,
    shaft_temperature: f64,
) -> Result<f64, AssemblyError> {
    finite("clearance wanted (m)", wanted)?;
    let at = |temperature| clearance(diameter, interference, hub, temperature, shaft, shaft_temperature);
    first_opening("hub", hub.points().iter().map(|point| point.0).collect(), wanted, at)
}

/// Highest shaft temperature (K) on its curve at which the diametral clearance `wanted` (m) opens.
///
/// Solves c(T_s) = c_wanted with [`clearance`] by a bracketed root on each piece of the shaft's own curve.
///
/// # Errors
/// As [`hub_temperature_for`].
///
/// # Example
/// ```
/// use hubgrip::assembly::thermal::shaft_temperature_for;
/// use hubgrip::material::Expansion;
/// let hub = Expansion::from_mean(12e-6, 273.15, 573.15, "mean of 20 to 300 °C").unwrap();
/// let shaft = Expansion::from_mean(8.5e-6, 77.0, 293.15, "mean of 20 to −196 °C").unwrap();
/// let temperature = shaft_temperature_for(0.1, 100e-6, 20e-6, &hub, 293.15, &shaft).unwrap();
/// assert!((temperature - 152.114565).abs() < 1e-6);
/// ```
pub fn shaft_temperature_for(
    diameter: f64,
    interference: f64,
    wanted: f64,
    hub: &Expansion,
    hub_temperature: f64,
    shaft: &Expansion,
) -> Result<f64, AssemblyError> {
    finite("clearance wanted (m)", wanted)?;
    let at = |temperature| clearance(diameter, interference, hub, hub_temperature, shaft, temperature);
    first_opening("shaft", shaft.points().iter().rev().map(|point| point.0).collect(), wanted, at)
}

/// Diametral shrinkage (m) of a part of `diameter` (m, at 20 °C) from temperature `from` to `to` (K).
///
/// Δd = d (ε(from) − ε(to)); negative when the part grows.
///
/// # Errors
/// As [`clearance`], for the shaft.
pub fn shrinkage(diameter: f64, part: &Expansion, from: f64, to: f64) -> Result<f64, AssemblyError> {
    positive("diameter (m)", diameter)?;
    Ok(diameter * (strain("shaft", part, from)? - strain("shaft", part, to)?))
}

/// Clearance to aim for while joining hot or cold when none is given: a thousandth of the diameter.
///
/// Workshop tables go up to two thousandths.
///
/// # Errors
/// [`AssemblyError::OutsideRange`] when the diameter is not greater than zero.
///
/// # Example
/// ```
/// let clearance = hubgrip::assembly::thermal::default_clearance(0.06).unwrap();
/// assert!((clearance.value - 60e-6).abs() < 1e-18);
/// ```
pub fn default_clearance(diameter: f64) -> Result<Sourced<f64>, AssemblyError> {
    positive("joint diameter (m)", diameter)?;
    Ok(Sourced::new(
        diameter / 1000.0,
        "0.001 D after DIN 7190, as printed in Westsächsische Hochschule Zwickau, \
         Berechnungsgleichungen für Pressverbindungen II (2013), sheet 6",
    ))
}

fn strain(part: &'static str, expansion: &Expansion, temperature: f64) -> Result<f64, AssemblyError> {
    expansion.strain(temperature).map_err(|_| {
        let (from, to) = expansion.range();
        AssemblyError::OutsideCurve { part, from, to, given: temperature }
    })
}

/// First root of `clearance_at(T) − wanted` along the temperatures of a curve, in their order.
///
/// Between two points of its table a curve only rises or only falls, so each piece holds one root at most.
fn first_opening(
    part: &'static str,
    temperatures: Vec<f64>,
    wanted: f64,
    clearance_at: impl Fn(f64) -> Result<f64, AssemblyError>,
) -> Result<f64, AssemblyError> {
    let openings: Vec<f64> = temperatures.iter().map(|&t| clearance_at(t)).collect::<Result<_, _>>()?;
    let lacking = |temperature: f64| clearance_at(temperature).map_or(f64::NAN, |c| c - wanted);
    for (ends, values) in temperatures.windows(2).zip(openings.windows(2)) {
        if values[0] <= wanted && values[1] >= wanted {
            return Ok(bracketed(lacking, ends[0], ends[1], 0.0)?);
        }
    }
    let least = openings.iter().copied().fold(f64::INFINITY, f64::min);
    let last = openings.len() - 1;
    if openings[last] < wanted {
        Err(AssemblyError::CurveEnds { part, end: temperatures[last], clearance: openings[last], wanted })
    } else {
        Err(AssemblyError::AlwaysClear { part, least, wanted })
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::material::REFERENCE_TEMPERATURE;
    use approx::{assert_abs_diff_eq, assert_relative_eq};
    use proptest::prelude::*;

    const SHOP: f64 = REFERENCE_TEMPERATURE;

    fn mean(coefficient: f64) -> Expansion {
        Expansion::from_mean(coefficient, 77.0, 800.0, "test").unwrap()
    }

    /// Expansion from instantaneous coefficients (K, 1/K): trapezium steps of 1 K, linear between, constant outside.
    fn from_instantaneous(table: &[(f64, f64)], from: f64, to: f64) -> Expansion {
        let alpha = |t: f64| {
            let after = table.partition_point(|point| point.0 <= t);
            if after == 0 {
                table[0].1
            } else if after == table.len() {
                table[after - 1].1
            } else {
                let ((t0, a0), (t1, a1)) = (table[after - 1], table[after]);
                a0 + (a1 - a0) * (t - t0) / (t1 - t0)
            }
        };
        let strain = |t: f64| {
            let steps = 2000;
            let width = (t - SHOP) / f64::from(steps);
            (0..steps).map(|i| alpha(SHOP + (f64::from(i) + 0.5) * width) * width).sum::<f64>()
        };
        let mut temperatures: Vec<f64> =
            (0..=400).map(|i| from + (to - from) * f64::from(i) / 400.0).collect();
        temperatures.push(SHOP);
        temperatures.push(443.15);
        temperatures.sort_by(f64::total_cmp);
        temperatures.dedup();
        let points: Vec<(f64, f64)> = temperatures.into_iter().map(|t| (t, strain(t))).collect();
        Expansion::from_strains(&points, "test").unwrap()
    }

    /// NIST fit 1e5 (L − L293)/L293 = a + bT + cT² + dT³ + eT⁴, referred to 293.15 K, sampled every kelvin.
    fn nist(coefficients: [f64; 5], constant_below: (f64, f64)) -> Expansion {
        let fit = |t: f64| {
            if t < constant_below.0 {
                constant_below.1 * 1e-5
            } else {
                coefficients.iter().rev().fold(0.0, |sum, c| sum * t + c) * 1e-5
            }
        };
        let strain = |t: f64| (1.0 + fit(t)) / (1.0 + fit(SHOP)) - 1.0;
        let mut temperatures: Vec<f64> = (50..=300).map(f64::from).collect();
        temperatures.extend([DRY_ICE_TEMPERATURE, LIQUID_NITROGEN_TEMPERATURE, SHOP]);
        temperatures.sort_by(f64::total_cmp);
        let points: Vec<(f64, f64)> = temperatures.into_iter().map(|t| (t, strain(t))).collect();
        Expansion::from_strains(&points, "NIST").unwrap()
    }

    /// D = 100 mm, U = 100 µm, constant coefficients: ΔT = (U + c)/(α D) by hand.
    #[test]
    fn constant_coefficients() {
        let steel = mean(12e-6);
        let hub = hub_temperature_for(0.1, 100e-6, 50e-6, &steel, &steel, SHOP).unwrap();
        assert_relative_eq!(hub, 418.15, max_relative = 1e-12);
        let shaft = shaft_temperature_for(0.1, 100e-6, 20e-6, &steel, SHOP, &mean(8.5e-6)).unwrap();
        assert_relative_eq!(shaft, 152.114_565, max_relative = 1e-8);
        let residual = clearance(0.1, 100e-6, &steel, SHOP, &mean(8.5e-6), shaft).unwrap() - 20e-6;
        assert!(residual.abs() < 1e-13 * 100e-6 + 1e-19);
    }

    /// Mean coefficients 12.0, 12.4, 12.9e-6 at 293.15, 393.15, 493.15 K, linear between: ε(443.15 K) = 1.8975e-3.
    ///
    /// The strain is then a parabola between the table points, so it is sampled every 5 K. For U + c = 150 µm
    /// on 100 mm the parabola gives 413.15 K.
    #[test]
    fn mean_coefficient_table() {
        let alpha = |t: f64| {
            if t <= 393.15 {
                12.0e-6 + 0.4e-6 * (t - 293.15) / 100.0
            } else {
                12.4e-6 + 0.5e-6 * (t - 393.15) / 100.0
            }
        };
        let points: Vec<(f64, f64)> =
            (0..=40).map(|i| 293.15 + 5.0 * f64::from(i)).map(|t| (t, alpha(t) * (t - SHOP))).collect();
        let hub = Expansion::from_strains(&points, "test").unwrap();
        assert_relative_eq!(hub.strain(443.15).unwrap(), 1.8975e-3, max_relative = 1e-12);
        let temperature = hub_temperature_for(0.1, 100e-6, 50e-6, &hub, &mean(12e-6), SHOP).unwrap();
        assert_relative_eq!(temperature, 413.15, max_relative = 1e-12);
    }

    /// Instantaneous coefficients 12.0, 12.8, 13.4e-6 at the same temperatures, integrated by hand:
    /// ε(443.15) = 1.8875e-3 and, constant below the table, ε(77.36) = −2.58948e-3.
    #[test]
    fn instantaneous_coefficients_are_integrated() {
        let table = [(293.15, 12.0e-6), (393.15, 12.8e-6), (493.15, 13.4e-6)];
        let curve = from_instantaneous(&table, 77.36, 493.15);
        assert_relative_eq!(curve.strain(443.15).unwrap(), 1.8875e-3, max_relative = 1e-7);
        assert_relative_eq!(curve.strain(77.36).unwrap(), -2.58948e-3, max_relative = 1e-9);
    }

    /// NIST Cryogenic Materials Properties, linear expansion of 6061-T6 and AISI 304 (fits of Bradley and
    /// Radebaugh; Marquardt, Le and Radebaugh 2000): values of the polynomials at the two baths.
    #[test]
    fn nist_contraction_in_the_baths() {
        let aluminium = nist([-412.77, -0.30389, 8.7696e-3, -9.9821e-6, 0.0], (18.0, -415.45));
        let stainless = nist([-295.54, -0.39811, 9.2683e-3, -2.0261e-5, 1.7127e-8], (23.0, -300.04));
        for (curve, bath, strain) in [
            (&aluminium, DRY_ICE_TEMPERATURE, -2.135_756_04e-3),
            (&stainless, DRY_ICE_TEMPERATURE, -1.470_125_85e-3),
            (&aluminium, LIQUID_NITROGEN_TEMPERATURE, -3.887_207_81e-3),
            (&stainless, LIQUID_NITROGEN_TEMPERATURE, -2.799_422_84e-3),
        ] {
            assert_relative_eq!(shrinkage(1.0, curve, SHOP, bath).unwrap(), -strain, max_relative = 1e-8);
        }
    }

    #[test]
    fn a_curve_that_ends_is_said_and_not_extrapolated() {
        let short = Expansion::from_mean(12e-6, 273.15, 373.15, "test").unwrap();
        let error = hub_temperature_for(0.1, 100e-6, 50e-6, &short, &mean(12e-6), SHOP).unwrap_err();
        let AssemblyError::CurveEnds { part, end, clearance, wanted } = error else { panic!("{error}") };
        assert_eq!((part, end, wanted), ("hub", 373.15, 50e-6));
        assert_abs_diff_eq!(clearance, 0.1 * 12e-6 * 80.0 - 100e-6, epsilon = 1e-15);
        assert!(matches!(
            clearance_of(&short, 400.0),
            Err(AssemblyError::OutsideCurve { part: "hub", given: 400.0, .. })
        ));
    }

    fn clearance_of(hub: &Expansion, temperature: f64) -> Result<f64, AssemblyError> {
        clearance(0.1, 100e-6, hub, temperature, &mean(12e-6), SHOP)
    }

    #[test]
    fn a_curve_that_turns_back_gives_the_first_opening() {
        // Invented curve of a low-expansion alloy that shrinks, then grows again below 150 K.
        let turning = Expansion::from_strains(
            &[(77.0, -3.0e-4), (150.0, -6.0e-4), (293.15, 0.0), (400.0, 2e-4)],
            "invented",
        )
        .unwrap();
        let temperature = shaft_temperature_for(0.1, 20e-6, 15e-6, &mean(12e-6), SHOP, &turning).unwrap();
        assert!(temperature > 150.0);
    }

    proptest! {
        #[test]
        fn more_interference_needs_a_hotter_hub(u in 10e-6..150e-6_f64, more in 1e-6..50e-6_f64) {
            let steel = mean(12e-6);
            let at = |u| hub_temperature_for(0.1, u, 50e-6, &steel, &steel, SHOP).unwrap();
            prop_assert!(at(u + more) > at(u));
        }
    }
}
