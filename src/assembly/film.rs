//! Heat exchange of a surface with what surrounds it.

use super::boiling::nitrogen_heat_flux;
use super::error::{AssemblyError, not_negative, positive, require};
use super::property::Property;
use crate::numerics::root::bracketed;

/// Stefan–Boltzmann constant, W/(m²·K⁴) (CODATA 2018, exact).
pub const STEFAN_BOLTZMANN: f64 = 5.670_374_419e-8;

/// How a surface stands in still air.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Standing {
    /// Vertical plate or upright cylinder; the size is its height.
    Vertical,
    /// Lying cylinder; the size is its diameter.
    HorizontalCylinder,
}

/// Heat exchange of a surface.
#[derive(Debug, Clone, PartialEq)]
pub enum Film {
    /// None.
    Insulated,
    /// The same coefficient at every temperature, W/(m²·K).
    Constant(f64),
    /// Coefficient (W/(m²·K)) against surface temperature (K).
    Curve(Property),
    /// Moved gas with a constant coefficient (W/(m²·K)), and radiation to walls at the gas temperature.
    Gas {
        /// Convection only, W/(m²·K).
        coefficient: f64,
        /// Emissivity of the surface, 0 to 1.
        emissivity: f64,
    },
    /// Still air and radiation to walls at the air temperature.
    StillAir {
        /// How the surface stands.
        standing: Standing,
        /// Height or diameter, m.
        size: f64,
        /// Emissivity of the surface, 0 to 1.
        emissivity: f64,
    },
    /// A pool of boiling nitrogen; the number is the diameter of the part, m.
    NitrogenPool(f64),
}

impl Film {
    /// Heat flux leaving the surface, W/m²; negative when the surface is colder than its surroundings.
    ///
    /// Still air follows the simplified laminar and turbulent relations of natural convection, whichever is
    /// greater: lying cylinder 1.32 (ΔT/D)^¼ and 1.24 ΔT^⅓, upright 1.42 (ΔT/H)^¼ and 1.31 ΔT^⅓ W/(m²·K), for
    /// air near room temperature and pressure. In the nitrogen pool the liquid boils at 77.36 K.
    ///
    /// Source: J. P. Holman, *Heat Transfer*, table of simplified equations for free convection in air (from
    /// memory); Stefan–Boltzmann law for grey surfaces in wide surroundings; [`nitrogen_heat_flux`].
    ///
    /// # Example
    /// ```
    /// use hubgrip::assembly::film::Film;
    /// assert_eq!(Film::Constant(10.0).heat_flux(353.15, 293.15), 600.0);
    /// ```
    pub fn heat_flux(&self, surface: f64, surroundings: f64) -> f64 {
        let difference = surface - surroundings;
        match self {
            Self::Insulated => 0.0,
            Self::Constant(coefficient) => coefficient * difference,
            Self::Curve(coefficient) => coefficient.value_held(surface) * difference,
            Self::Gas { coefficient, emissivity } => {
                coefficient * difference + radiation(*emissivity, surface, surroundings)
            }
            Self::StillAir { standing, size, emissivity } => {
                let (coefficient, _) = still_air(*standing, *size, difference.abs());
                coefficient * difference + radiation(*emissivity, surface, surroundings)
            }
            Self::NitrogenPool(diameter) => nitrogen_heat_flux(*diameter, surface),
        }
    }

    /// Checks the numbers of the film.
    pub(crate) fn check(&self, one: f64, other: f64) -> Result<(), AssemblyError> {
        let valid_emissivity = |emissivity: f64| {
            require((0.0..=1.0).contains(&emissivity), "emissivity", emissivity, "between 0 and 1")
        };
        match self {
            Self::Insulated => Ok(()),
            Self::Constant(coefficient) => {
                not_negative("film coefficient (W/(m²·K))", *coefficient).map(|_| ())
            }
            Self::Curve(coefficient) => coefficient.covers(one, other),
            Self::Gas { coefficient, emissivity } => {
                not_negative("film coefficient (W/(m²·K))", *coefficient)?;
                valid_emissivity(*emissivity).map(|_| ())
            }
            Self::StillAir { size, emissivity, .. } => {
                positive("size of the surface (m)", *size)?;
                valid_emissivity(*emissivity).map(|_| ())
            }
            Self::NitrogenPool(diameter) => positive("diameter of the part (m)", *diameter).map(|_| ()),
        }
    }

    /// Surface with `conductance` (W/(m²·K)) between it and a point at `inside` (K).
    pub(crate) fn surface(&self, inside: f64, conductance: f64, surroundings: f64) -> Surface {
        let coefficient = match self {
            Self::Insulated => Some(0.0),
            Self::Constant(coefficient) => Some(*coefficient),
            _ => None,
        };
        if let Some(coefficient) = coefficient {
            let slope = conductance * coefficient / (conductance + coefficient);
            let heat_flux = slope * (inside - surroundings);
            return Surface { temperature: inside - heat_flux / conductance, heat_flux, slope };
        }
        let (temperature, film_slope) = self.balanced(inside, conductance, surroundings);
        // In transition boiling the film's slope is negative; it must not outweigh the conduction from inside.
        let film_slope = film_slope.max(-0.9 * conductance);
        let slope = conductance * film_slope / (conductance + film_slope);
        Surface { temperature, heat_flux: conductance * (inside - temperature), slope }
    }

    /// Slope of the heat flux against the surface temperature, W/(m²·K), where it has a short form.
    fn slope(&self, surface: f64, surroundings: f64) -> Option<f64> {
        let (convection, emissivity) = match self {
            Self::Gas { coefficient, emissivity } => (*coefficient, *emissivity),
            Self::StillAir { standing, size, emissivity } => {
                let (coefficient, exponent) = still_air(*standing, *size, (surface - surroundings).abs());
                (coefficient * (1.0 + exponent), *emissivity)
            }
            _ => return None,
        };
        Some(convection + 4.0 * emissivity * STEFAN_BOLTZMANN * surface * surface * surface)
    }

    /// Surface temperature at which conduction from inside equals the exchange, and the slope of the exchange there.
    ///
    /// Newton's method from inside, where a metal's surface is near; a bracketed root when it does not settle.
    fn balanced(&self, inside: f64, conductance: f64, surroundings: f64) -> (f64, f64) {
        let balance = |surface: f64| conductance * (inside - surface) - self.heat_flux(surface, surroundings);
        let slope_at = |surface: f64| {
            if let Some(slope) = self.slope(surface, surroundings) {
                return slope;
            }
            let nudge = 1e-4;
            (self.heat_flux(surface + nudge, surroundings) - self.heat_flux(surface - nudge, surroundings))
                / (2.0 * nudge)
        };
        let (low, high) = (inside.min(surroundings), inside.max(surroundings));
        let mut surface = inside;
        let (mut slope, mut last) = (slope_at(surface), f64::INFINITY);
        for _ in 0..10 {
            let change = balance(surface) / (conductance + slope);
            surface += change;
            if !(low..=high).contains(&surface) {
                break;
            }
            if change.abs() < 1e-9 {
                return (surface, slope);
            }
            // The slope of before serves as long as it closes in fast.
            if change.abs() > 0.03 * last {
                slope = slope_at(surface);
            }
            last = change.abs();
        }
        let surface = bracketed(balance, inside, surroundings, 1e-10).unwrap_or(f64::NAN);
        (surface, slope_at(surface))
    }
}

/// A surface in balance between conduction from inside and exchange outside.
pub(crate) struct Surface {
    /// Its temperature, K.
    pub(crate) temperature: f64,
    /// Heat flux leaving it, W/m².
    pub(crate) heat_flux: f64,
    /// Slope of that flux against the temperature inside, W/(m²·K).
    pub(crate) slope: f64,
}

/// Coefficient of still air at a temperature difference (K), W/(m²·K), and its exponent: the greater of the laminar
/// a (ΔT/s)^¼ and the turbulent b ΔT^⅓, which is the greater one where ΔT s³ > (a/b)¹².
fn still_air(standing: Standing, size: f64, difference: f64) -> (f64, f64) {
    let (laminar, turbulent): (f64, f64) = match standing {
        Standing::HorizontalCylinder => (1.32, 1.24),
        Standing::Vertical => (1.42, 1.31),
    };
    if difference * size * size * size > (laminar / turbulent).powi(12) {
        (turbulent * difference.cbrt(), 1.0 / 3.0)
    } else {
        (laminar * (difference / size).sqrt().sqrt(), 0.25)
    }
}

fn radiation(emissivity: f64, surface: f64, surroundings: f64) -> f64 {
    emissivity
        * STEFAN_BOLTZMANN
        * (surface * surface + surroundings * surroundings)
        * (surface + surroundings)
        * (surface - surroundings)
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    #[test]
    fn radiation_is_that_of_the_fourth_powers() {
        let film = Film::Gas { coefficient: 0.0, emissivity: 0.8 };
        let expected = 0.8 * STEFAN_BOLTZMANN * (523.15_f64.powi(4) - 293.15_f64.powi(4));
        assert_relative_eq!(film.heat_flux(523.15, 293.15), expected, max_relative = 1e-12);
        // 4 ε σ T³ at 450 K is 16.5 W/(m²·K): the usual supplement for an oven at 250 °C.
        assert_relative_eq!(4.0 * 0.8 * STEFAN_BOLTZMANN * 450.0_f64.powi(3), 16.5, max_relative = 3e-3);
    }

    #[test]
    fn still_air_stays_in_the_band_of_free_convection() {
        // Free convection of gases: 2 to 25 W/(m²·K) (usual range of heat-transfer textbooks).
        for standing in [Standing::Vertical, Standing::HorizontalCylinder] {
            for difference in [5.0, 50.0, 300.0] {
                let film = Film::StillAir { standing, size: 0.1, emissivity: 0.0 };
                let h = film.heat_flux(293.15 + difference, 293.15) / difference;
                assert!((2.0..25.0).contains(&h), "{h}");
            }
        }
    }

    /// Either branch is the greater one on its side, and the slope is that of the flux.
    #[test]
    fn still_air_takes_the_greater_relation() {
        for (standing, laminar, turbulent) in
            [(Standing::Vertical, 1.42, 1.31), (Standing::HorizontalCylinder, 1.32, 1.24)]
        {
            for size in [0.02, 0.3, 1.0, 3.0] {
                for difference in [0.0_f64, 0.5, 4.0, 30.0, 200.0] {
                    let film = Film::StillAir { standing, size, emissivity: 0.4 };
                    let greater =
                        (laminar * (difference / size).powf(0.25)).max(turbulent * difference.cbrt());
                    let flux = greater * difference + radiation(0.4, 293.15 + difference, 293.15);
                    assert_relative_eq!(
                        film.heat_flux(293.15 + difference, 293.15),
                        flux,
                        max_relative = 1e-13
                    );
                    if difference > 0.0 {
                        let at = |t: f64| film.heat_flux(293.15 + difference + t, 293.15);
                        let slope = (at(1e-3) - at(-1e-3)) / 2e-3;
                        let own = film.slope(293.15 + difference, 293.15).unwrap();
                        assert_relative_eq!(own, slope, max_relative = 1e-5);
                    }
                }
            }
        }
    }

    #[test]
    fn surface_balances_conduction_and_exchange() {
        for film in [
            Film::Constant(100.0),
            Film::Gas { coefficient: 10.0, emissivity: 0.8 },
            Film::StillAir { standing: Standing::Vertical, size: 0.1, emissivity: 0.5 },
        ] {
            let surface = film.surface(450.0, 2e4, 293.15);
            assert_relative_eq!(
                surface.heat_flux,
                film.heat_flux(surface.temperature, 293.15),
                max_relative = 1e-8
            );
            let nudged = film.surface(450.1, 2e4, 293.15);
            assert_relative_eq!(
                (nudged.heat_flux - surface.heat_flux) / 0.1,
                surface.slope,
                max_relative = 1e-3
            );
        }
    }
}
