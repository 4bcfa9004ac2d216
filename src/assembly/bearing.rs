//! Bearing rings on their seats: what the fit does to the raceways and to the internal clearance.

use super::error::{AssemblyError, finite, not_negative, positive, require};

/// Elastic constants of a part.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Elastic {
    /// Young's modulus, Pa.
    pub youngs_modulus: f64,
    /// Poisson's ratio.
    pub poisson: f64,
}

/// An inner ring pressed on a shaft.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct InnerRingFit {
    /// Effective diametral interference after smoothing, m; zero or less leaves the ring as it is.
    pub interference: f64,
    /// Bore of the bearing, m.
    pub bore: f64,
    /// Raceway diameter of the inner ring, m; the ring is treated as a plain one from bore to raceway.
    pub raceway: f64,
    /// Bore of the shaft, m; zero when solid.
    pub shaft_bore: f64,
    /// The ring.
    pub ring: Elastic,
    /// The shaft.
    pub shaft: Elastic,
}

/// An outer ring pressed into a housing.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct OuterRingFit {
    /// Effective diametral interference after smoothing, m; zero or less leaves the ring as it is.
    pub interference: f64,
    /// Outside diameter of the bearing, m.
    pub outside: f64,
    /// Raceway diameter of the outer ring, m; the ring is treated as a plain one from raceway to outside.
    pub raceway: f64,
    /// Outside diameter of the housing, m.
    pub housing_outside: f64,
    /// The ring.
    pub ring: Elastic,
    /// The housing.
    pub housing: Elastic,
}

/// What the seat does to a bearing ring.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct RingChange {
    /// Contact pressure on the seat, Pa.
    pub pressure: f64,
    /// Change of the raceway diameter that takes away clearance, m; never negative.
    pub raceway_change: f64,
    /// Hoop stress of greatest size in the ring, Pa: tension at the bore of an inner ring, compression at the raceway
    /// of an outer one.
    pub hoop_stress: f64,
}

/// Growth of the inner raceway on its seat (Lamé).
///
/// p = U / (d [C_r/E_r + C_s/E_s]),  C_r = (F² + d²)/(F² − d²) + ν_r,  C_s = (d² + d_i²)/(d² − d_i²) − ν_s
///
/// ΔF = 2 p d² F / (E_r (F² − d²));  one material: ΔF = U (d/F)(1 − q²)/(1 − q²(d/F)²), q = d_i/d
///
/// | symbol | meaning | unit | valid |
/// |---|---|---|---|
/// | U | effective diametral interference | m | any; ≤ 0 gives zero |
/// | d, F, d_i | bearing bore, raceway, shaft bore | m | 0 ≤ d_i < d < F |
/// | E, ν | elastic constants of ring and shaft | Pa, – | E > 0, −1 < ν < 0.5 |
///
/// Elastic, at rest, at one temperature. The ring is plain: its shoulders and grooves are in the choice of F.
///
/// Source: T. A. Harris and M. N. Kotzalas, *Essential Concepts of Bearing Technology*, 5th ed., chapter on
/// interference fitting and clearance; Lamé.
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// ```
/// use hubgrip::assembly::bearing::{Elastic, InnerRingFit, inner_ring};
/// let steel = Elastic { youngs_modulus: 200e9, poisson: 0.3 };
/// let fit = InnerRingFit {
///     interference: 20e-6,
///     bore: 0.05,
///     raceway: 0.06,
///     shaft_bore: 0.0,
///     ring: steel,
///     shaft: steel,
/// };
/// let change = inner_ring(&fit).unwrap();
/// assert!((change.raceway_change - 16.6666667e-6).abs() < 1e-12);
/// ```
pub fn inner_ring(fit: &InnerRingFit) -> Result<RingChange, AssemblyError> {
    finite("interference (m)", fit.interference)?;
    not_negative("bore of the shaft (m)", fit.shaft_bore)?;
    positive("wall of the shaft (m)", fit.bore - fit.shaft_bore)?;
    positive("wall of the ring (m)", fit.raceway - fit.bore)?;
    check(&fit.ring)?;
    check(&fit.shaft)?;
    let outer = squares(fit.raceway, fit.bore) + fit.ring.poisson;
    let inner = squares(fit.bore, fit.shaft_bore) - fit.shaft.poisson;
    let pressure = pressure(fit.interference, fit.bore, (outer, &fit.ring), (inner, &fit.shaft));
    let (d, f) = (fit.bore, fit.raceway);
    Ok(RingChange {
        pressure,
        raceway_change: 2.0 * pressure * d * d * f / (fit.ring.youngs_modulus * (f * f - d * d)),
        hoop_stress: pressure * squares(f, d),
    })
}

/// Contraction of the outer raceway in its seat (Lamé).
///
/// p = U / (D [C_h/E_h + C_r/E_r]),  C_h = (D_h² + D²)/(D_h² − D²) + ν_h,  C_r = (D² + R²)/(D² − R²) − ν_r
///
/// ΔR = 2 p D² R / (E_r (D² − R²));  one material: ΔR = U (R/D)(1 − Q²)/(1 − (R/D)²Q²), Q = D/D_h
///
/// | symbol | meaning | unit | valid |
/// |---|---|---|---|
/// | U | effective diametral interference | m | any; ≤ 0 gives zero |
/// | D, R, D_h | bearing outside, raceway, housing outside | m | 0 < R < D < D_h |
/// | E, ν | elastic constants of ring and housing | Pa, – | E > 0, −1 < ν < 0.5 |
///
/// Assumptions and source as for [`inner_ring`]; the housing is a plain ring.
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// ```
/// use hubgrip::assembly::bearing::{Elastic, OuterRingFit, outer_ring};
/// let fit = OuterRingFit {
///     interference: 10e-6,
///     outside: 0.1,
///     raceway: 0.09,
///     housing_outside: 0.13,
///     ring: Elastic { youngs_modulus: 200e9, poisson: 0.3 },
///     housing: Elastic { youngs_modulus: 70e9, poisson: 0.33 },
/// };
/// let change = outer_ring(&fit).unwrap();
/// assert!((change.raceway_change - 4.44609228e-6).abs() < 1e-13);
/// ```
pub fn outer_ring(fit: &OuterRingFit) -> Result<RingChange, AssemblyError> {
    finite("interference (m)", fit.interference)?;
    positive("raceway (m)", fit.raceway)?;
    positive("wall of the ring (m)", fit.outside - fit.raceway)?;
    positive("wall of the housing (m)", fit.housing_outside - fit.outside)?;
    check(&fit.ring)?;
    check(&fit.housing)?;
    let outer = squares(fit.housing_outside, fit.outside) + fit.housing.poisson;
    let inner = squares(fit.outside, fit.raceway) - fit.ring.poisson;
    let pressure = pressure(fit.interference, fit.outside, (outer, &fit.housing), (inner, &fit.ring));
    let (d, r) = (fit.outside, fit.raceway);
    Ok(RingChange {
        pressure,
        raceway_change: 2.0 * pressure * d * d * r / (fit.ring.youngs_modulus * (d * d - r * r)),
        hoop_stress: -2.0 * pressure * d * d / (d * d - r * r),
    })
}

/// Change of the raceway of a ring under a contact pressure on its seat, m; never negative.
///
/// ΔF = 2 p d² F / (E |F² − d²|), for an inner ring with F > d as for an outer ring with its raceway within.
///
/// | symbol | meaning | unit | valid |
/// |---|---|---|---|
/// | p | contact pressure on the seat | Pa | ≥ 0 |
/// | d | diameter of the seat | m | > 0 |
/// | F | raceway diameter | m | > 0, not d |
/// | E | Young's modulus of the ring | Pa | > 0 |
///
/// Assumptions and source as for [`inner_ring`]: the raceway is a free face, its hoop strain is its change.
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// ```
/// use hubgrip::assembly::bearing::raceway_change;
/// let growth = raceway_change(10.5817e6, 0.05, 0.058, 206e9).unwrap();
/// assert!((growth - 17.2414e-6).abs() < 1e-10);
/// ```
pub fn raceway_change(
    pressure: f64,
    seat: f64,
    raceway: f64,
    youngs_modulus: f64,
) -> Result<f64, AssemblyError> {
    not_negative("contact pressure (Pa)", pressure)?;
    positive("diameter of the seat (m)", seat)?;
    positive("raceway (m)", raceway)?;
    positive("Young's modulus (Pa)", youngs_modulus)?;
    let squares = positive("wall of the ring (m²)", (raceway * raceway - seat * seat).abs())?;
    Ok(2.0 * pressure * seat * seat * raceway / (youngs_modulus * squares))
}

/// Radial internal clearance after mounting, m, diametral as the standard has it.
///
/// G = G_0 − ΔF − ΔR − α (T_i − T_o)(F + R)/2
///
/// with the unmounted clearance G_0, the changes of [`inner_ring`] and [`outer_ring`], the expansion coefficient α of
/// bearing steel (1/K), the inner ring hotter than the outer by T_i − T_o (K), and the mean raceway diameter (m).
/// Negative is preload.
///
/// Source: Harris and Kotzalas as for [`inner_ring`].
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// ```
/// use hubgrip::assembly::bearing::mounted_clearance;
/// let left = mounted_clearance(28e-6, 12e-6, 4e-6, 12.5e-6, 5.0, 0.075).unwrap();
/// assert!((left - 7.3125e-6).abs() < 1e-15);
/// ```
pub fn mounted_clearance(
    unmounted: f64,
    inner_growth: f64,
    outer_contraction: f64,
    expansion: f64,
    inner_hotter_by: f64,
    mean_raceway: f64,
) -> Result<f64, AssemblyError> {
    finite("clearance before mounting (m)", unmounted)?;
    not_negative("growth of the inner raceway (m)", inner_growth)?;
    not_negative("contraction of the outer raceway (m)", outer_contraction)?;
    not_negative("expansion coefficient (1/K)", expansion)?;
    finite("temperature difference (K)", inner_hotter_by)?;
    positive("mean raceway diameter (m)", mean_raceway)?;
    Ok(unmounted - inner_growth - outer_contraction - expansion * inner_hotter_by * mean_raceway)
}

/// Kind of rolling bearing.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum BearingKind {
    /// Radial-contact groove ball bearing.
    Ball,
    /// Cylindrical roller bearing.
    Roller,
}

/// Effective raceway diameters of inner and outer ring, m, when the true ones are not known.
///
/// Ball bearings (D + 4d)/5 and (4D + d)/5, cylindrical roller bearings (D + 3d)/4 and (3D + d)/4. The change of
/// clearance depends directly on them, so use the true diameters when you have them.
///
/// Source: bearing handbooks, from memory.
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// ```
/// use hubgrip::assembly::bearing::{BearingKind, effective_raceways};
/// let (inner, outer) = effective_raceways(BearingKind::Ball, 0.05, 0.09).unwrap();
/// assert!((inner - 0.058).abs() < 1e-15 && (outer - 0.082).abs() < 1e-15);
/// ```
pub fn effective_raceways(kind: BearingKind, bore: f64, outside: f64) -> Result<(f64, f64), AssemblyError> {
    positive("bore of the bearing (m)", bore)?;
    positive("section of the bearing (m)", outside - bore)?;
    let parts = match kind {
        BearingKind::Ball => 5.0,
        BearingKind::Roller => 4.0,
    };
    let step = (outside - bore) / parts;
    Ok((bore + step, outside - step))
}

fn check(part: &Elastic) -> Result<(), AssemblyError> {
    positive("Young's modulus (Pa)", part.youngs_modulus)?;
    let poisson = part.poisson;
    require(poisson > -1.0 && poisson < 0.5, "Poisson's ratio", poisson, "between −1 and 0.5")?;
    Ok(())
}

fn squares(large: f64, small: f64) -> f64 {
    (large * large + small * small) / (large * large - small * small)
}

fn pressure(interference: f64, diameter: f64, outer: (f64, &Elastic), inner: (f64, &Elastic)) -> f64 {
    let compliance = outer.0 / outer.1.youngs_modulus + inner.0 / inner.1.youngs_modulus;
    interference.max(0.0) / (diameter * compliance)
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;
    use proptest::prelude::*;

    const STEEL: Elastic = Elastic { youngs_modulus: 200e9, poisson: 0.3 };

    fn inner(shaft_bore: f64) -> InnerRingFit {
        InnerRingFit { interference: 20e-6, bore: 0.05, raceway: 0.06, shaft_bore, ring: STEEL, shaft: STEEL }
    }

    /// U 20 µm, d 50, F 60 mm, one material: U d/F, and with a shaft bore of 25 mm by the printed special case.
    #[test]
    fn inner_raceway_grows() {
        assert_relative_eq!(
            inner_ring(&inner(0.0)).unwrap().raceway_change,
            16.666_666_7e-6,
            max_relative = 1e-8
        );
        assert_relative_eq!(
            inner_ring(&inner(0.025)).unwrap().raceway_change,
            15.126_050_4e-6,
            max_relative = 1e-8
        );
    }

    /// Housing of E 70 GPa, ν 0.33, D 100, raceway 90, D_h 130 mm, U 10 µm.
    #[test]
    fn outer_raceway_contracts() {
        let fit = OuterRingFit {
            interference: 10e-6,
            outside: 0.1,
            raceway: 0.09,
            housing_outside: 0.13,
            ring: STEEL,
            housing: Elastic { youngs_modulus: 70e9, poisson: 0.33 },
        };
        let change = outer_ring(&fit).unwrap();
        assert_relative_eq!(change.raceway_change, 4.446_092_28e-6, max_relative = 1e-8);
        // The raceway changes by the hoop strain there, as its face is free: ΔR = R σ/E_r.
        assert_relative_eq!(-0.09 * change.hoop_stress / 200e9, change.raceway_change, max_relative = 1e-12);
    }

    /// E 206 GPa, ν 0.3, U 20 µm, computed from the Lamé equations: pressure MPa and change µm.
    #[test]
    fn cases_with_other_materials() {
        let ring = Elastic { youngs_modulus: 206e9, poisson: 0.3 };
        let iron = Elastic { youngs_modulus: 100e9, poisson: 0.26 };
        let inner = |shaft_bore, shaft| {
            inner_ring(&InnerRingFit {
                interference: 20e-6,
                bore: 0.05,
                raceway: 0.058,
                shaft_bore,
                ring,
                shaft,
            })
            .unwrap()
        };
        for (change, pressure, growth) in [
            (inner(0.0, ring), 10.5817e6, 17.2414e-6),
            (inner(0.025, ring), 9.7472e6, 15.8817e-6),
            (inner(0.0, iron), 9.5687e6, 15.5908e-6),
        ] {
            assert_relative_eq!(change.pressure, pressure, max_relative = 1e-5);
            assert_relative_eq!(change.raceway_change, growth, max_relative = 1e-5);
        }
        let aluminium = Elastic { youngs_modulus: 71e9, poisson: 0.33 };
        let outer = |housing| {
            let fit = OuterRingFit {
                interference: 20e-6,
                outside: 0.09,
                raceway: 0.082,
                housing_outside: 0.12,
                ring,
                housing,
            };
            outer_ring(&fit).unwrap()
        };
        for (change, pressure, contraction) in
            [(outer(ring), 3.1913e6, 14.9557e-6), (outer(aluminium), 2.1006e6, 9.8443e-6)]
        {
            assert_relative_eq!(change.pressure, pressure, max_relative = 2e-5);
            assert_relative_eq!(change.raceway_change, contraction, max_relative = 1e-5);
        }
    }

    #[test]
    fn a_loose_ring_is_left_as_it_is() {
        let loose = inner_ring(&InnerRingFit { interference: -5e-6, ..inner(0.0) }).unwrap();
        assert_eq!((loose.pressure, loose.raceway_change, loose.hoop_stress), (0.0, 0.0, 0.0));
        assert!(inner_ring(&InnerRingFit { raceway: 0.05, ..inner(0.0) }).is_err());
        assert!(inner_ring(&inner(0.05)).is_err());
        assert!(effective_raceways(BearingKind::Roller, 0.05, 0.05).is_err());
    }

    proptest! {
        #[test]
        fn one_material_takes_less_than_the_interference(
            q in 0.0..0.9_f64, ratio in 1.02..2.0_f64, interference in 1e-6..60e-6_f64,
        ) {
            let fit = InnerRingFit { interference, raceway: 0.05 * ratio, shaft_bore: 0.05 * q, ..inner(0.0) };
            let change = inner_ring(&fit).unwrap().raceway_change;
            // Special case for one material, as usually printed.
            let printed = interference / ratio * (1.0 - q * q) / (1.0 - (q / ratio).powi(2));
            prop_assert!((change / printed - 1.0).abs() < 1e-10);
            prop_assert!(change < interference);
        }
    }
}
