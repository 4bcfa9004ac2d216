//! What rotation adds to the permanent growth of a hub that has yielded.

use crate::mechanics::error::MechanicsError;
use crate::mechanics::ring::{RingLoad, RingSection, check};
use crate::mechanics::two_rings::TwoRings;
use crate::numerics::root;

/// A rotating joint whose hub yields after Tresca.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct SpinningJoint {
    /// Sizes and elastic constants.
    pub rings: TwoRings,
    /// Yield value S₀ of the greatest principal stress difference of the hub, Pa.
    pub yield_difference: f64,
    /// Density of the hub, kg/m³.
    pub hub_density: f64,
    /// Density of the shaft, kg/m³.
    pub shaft_density: f64,
}

/// The hub with its plastic zone out to a radius.
struct Zone {
    /// Contact pressure, Pa.
    pressure: f64,
    /// Pressure at the edge of the zone, Pa.
    edge_pressure: f64,
    /// Displacement of the bore, m.
    bore: f64,
}

impl SpinningJoint {
    /// Permanent diametral growth of the bore, m: the interference less the one by which an elastic joint would have
    /// the same pressure at the same speed.
    ///
    /// In the zone a ≤ r ≤ c: σφ − σr = S₀, σr = −p + S₀ ln(r/a) − ρω²(r² − a²)/2, and
    /// c u(c) − a u(a) = (1 − ν)/E ∫ (2σr + S₀) r dr, since εr + εφ is elastic there; outside of it the elastic ring.
    ///
    /// a, b, c radius of bore, rim and zone (m), p contact pressure (Pa), ρ density (kg/m³), ω angular speed (rad/s), u
    /// displacement (m), S₀ yield value (Pa), E, ν of the hub.
    ///
    /// Holds in plane stress, perfectly plastic, while the axial stress zero stays the intermediate one: 0 ≤ σφ at
    /// the bore and σr ≤ 0 in the zone. Rotation only widens the zone of a hub that has yielded at rest, so the order
    /// of joining and turning does not matter. Source: equilibrium and the flow rule of Tresca's criterion as in F. G.
    /// Kollmann, *Welle-Nabe-Verbindungen*, Springer 1984, with the body force of rotation added (own derivation).
    ///
    /// # Errors
    /// A speed or an interference at which that does not hold, or that is not finite; joints that are no joints.
    ///
    /// # Example
    /// ```
    /// use hubgrip::mechanics::{plastic::SpinningJoint, two_rings::TwoRings};
    /// let rings = TwoRings {
    ///     diameter: 0.05,
    ///     hub_outer_diameter: 0.1,
    ///     shaft_bore: 0.0,
    ///     hub_youngs_modulus: 200e9,
    ///     hub_poisson: 0.3,
    ///     shaft_youngs_modulus: 200e9,
    ///     shaft_poisson: 0.3,
    /// };
    /// let joint =
    ///     SpinningJoint { rings, yield_difference: 300e6, hub_density: 7800.0, shaft_density: 7800.0 };
    /// let at_rest = joint.permanent_growth(125e-6, 0.0).unwrap();
    /// assert!((at_rest - 3.11682086e-4 * 0.05).abs() < 1e-12);
    /// assert!(joint.permanent_growth(125e-6, 1000.0).unwrap() > at_rest);
    /// ```
    pub fn permanent_growth(&self, interference: f64, angular_speed: f64) -> Result<f64, MechanicsError> {
        check("interference (m)", interference, "finite", true)?;
        check("yield value (Pa)", self.yield_difference, "positive", self.yield_difference > 0.0)?;
        let rings = &self.rings;
        let (a, b) = (0.5 * rings.diameter, 0.5 * rings.hub_outer_diameter);
        let hub = self.hub(a)?;
        let turning = RingLoad { angular_speed, ..RingLoad::default() };
        let lost = 2.0 * (hub.displacement_at(&turning, a)? - self.shaft()?.displacement_at(&turning, a)?);
        let stiffness = rings.pressure(rings.diameter * 1e-3)? / (rings.diameter * 1e-3);
        let elastic = ((interference - lost) * stiffness).max(0.0);
        let stress = hub.stress_at(&RingLoad { inner_pressure: elastic, ..turning }, a)?;
        if (stress.hoop - stress.radial).max(stress.hoop) <= self.yield_difference {
            return Ok(0.0);
        }
        let missing = |c: f64| {
            self.overlap(c, angular_speed)
                .map_or(f64::NAN, |(_, overlap)| (overlap - interference) / rings.diameter)
        };
        let (from, to) = (a * (1.0 + 1e-12), b * (1.0 - 1e-9));
        let c = if missing(to) < 0.0 {
            to
        } else {
            root::bracketed(missing, from, to, 0.0).map_err(|reason| MechanicsError::NotSolved {
                what: "plastic zone of a rotating hub",
                reason,
            })?
        };
        let (zone, _) = self.overlap(c, angular_speed)?;
        let holds = zone.edge_pressure >= 0.0 && zone.pressure <= self.yield_difference;
        check(
            "angular speed of a hub that yields (rad/s)",
            angular_speed,
            "below that of another regime",
            holds,
        )?;
        Ok(((elastic - zone.pressure) / stiffness).max(0.0))
    }

    fn hub(&self, from: f64) -> Result<RingSection, MechanicsError> {
        let rings = &self.rings;
        let rim = 0.5 * rings.hub_outer_diameter;
        RingSection::new(from, rim, rings.hub_youngs_modulus, rings.hub_poisson, self.hub_density)
    }

    fn shaft(&self) -> Result<RingSection, MechanicsError> {
        let rings = &self.rings;
        let (bore, rim) = (0.5 * rings.shaft_bore, 0.5 * rings.diameter);
        RingSection::new(bore, rim, rings.shaft_youngs_modulus, rings.shaft_poisson, self.shaft_density)
    }

    /// The zone out to `c` with the interference that makes it, m.
    fn overlap(&self, c: f64, angular_speed: f64) -> Result<(Zone, f64), MechanicsError> {
        let a = 0.5 * self.rings.diameter;
        let zone = self.zone(c, angular_speed)?;
        let load = RingLoad { outer_pressure: zone.pressure, angular_speed, ..RingLoad::default() };
        let shaft = self.shaft()?.displacement_at(&load, a)?;
        let overlap = 2.0 * (zone.bore - shaft);
        Ok((zone, overlap))
    }

    fn zone(&self, c: f64, angular_speed: f64) -> Result<Zone, MechanicsError> {
        let (a, s0) = (0.5 * self.rings.diameter, self.yield_difference);
        let outside = self.hub(c)?;
        let difference = |load: &RingLoad| -> Result<f64, MechanicsError> {
            let stress = outside.stress_at(load, c)?;
            Ok(stress.hoop - stress.radial)
        };
        let turning = RingLoad { angular_speed, ..RingLoad::default() };
        let unit = RingLoad { inner_pressure: 1.0, ..RingLoad::default() };
        let edge_pressure = (s0 - difference(&turning)?) / difference(&unit)?;
        let pull = self.hub_density * angular_speed * angular_speed;
        let (a2, c2) = (a * a, c * c);
        let logarithm = (c / a).ln();
        let pressure = edge_pressure + s0 * logarithm - 0.5 * pull * (c2 - a2);
        let edge = outside.displacement_at(&RingLoad { inner_pressure: edge_pressure, ..turning }, c)?;
        let moment = 0.5 * (s0 - 2.0 * pressure + pull * a2) * (c2 - a2)
            + s0 * (c2 * logarithm - 0.5 * (c2 - a2))
            - 0.25 * pull * (c2 - a2) * (c2 + a2);
        let compliance = (1.0 - self.rings.hub_poisson) / self.rings.hub_youngs_modulus;
        Ok(Zone { pressure, edge_pressure, bore: (edge * c - compliance * moment) / a })
    }
}
