//! How long a part soaks in an oven or a bath, and what the quick change of temperature does to it.

use super::conduction::{Conduction, Estimate};
use super::error::{AssemblyError, positive, require};
use crate::material::{Expansion, Sourced};

/// Soak of a part, from going in to being through.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Soak {
    /// Time until the volume mean has covered 90 % of the step, s.
    pub to_90_percent: Estimate,
    /// Time until 95 %, s.
    pub to_95_percent: Estimate,
    /// Time until 99 %, s: the part may be called soaked.
    pub to_99_percent: Estimate,
    /// Greatest difference between bore (or centre) and rim on the way, K.
    pub greatest_difference: f64,
    /// When it occurs, s.
    pub greatest_difference_at: f64,
}

/// Soak of a part in its surroundings: the 90, 95 and 99 % marks of the volume mean and the greatest difference
/// between inside and outside.
///
/// The clearance follows the mean, so 99 % of the temperature step is 99 % of the change of diameter when the
/// expansion coefficient is constant.
///
/// # Errors
/// As [`Conduction::time_to_mean`].
///
/// # Example
/// ```
/// use hubgrip::assembly::conduction::{Body, Conduction, Substance, Surroundings};
/// use hubgrip::assembly::film::Film;
/// use hubgrip::assembly::soak::soak;
/// let hub = Body { inner_diameter: 0.06, outer_diameter: 0.12, length: 0.06 };
/// let steel = Substance::constant(50.0, 7800.0, 500.0).unwrap();
/// let oven = Surroundings::all_round(523.15, Film::Gas { coefficient: 40.0, emissivity: 0.8 });
/// let marks = soak(&Conduction::new(hub, steel, oven, 293.15).unwrap().with_rings(4).unwrap()).unwrap();
/// assert!(marks.to_90_percent.value < marks.to_99_percent.value);
/// ```
pub fn soak(part: &Conduction) -> Result<Soak, AssemblyError> {
    Ok(soak_to(part, part.start())?.0)
}

/// The soak of a part, and the time until its volume mean has come to `wanted` (K), in one calculation.
///
/// The time is none when the mean never comes there: `wanted` lies beyond 99.9 % of the step.
///
/// # Errors
/// As [`soak`].
///
/// # Example
/// ```
/// use hubgrip::assembly::conduction::{Body, Conduction, Substance, Surroundings};
/// use hubgrip::assembly::film::Film;
/// use hubgrip::assembly::soak::soak_to;
/// let hub = Body { inner_diameter: 0.06, outer_diameter: 0.12, length: 0.06 };
/// let steel = Substance::constant(50.0, 7800.0, 500.0).unwrap();
/// let oven = Surroundings::all_round(523.15, Film::Gas { coefficient: 40.0, emissivity: 0.8 });
/// let part = Conduction::new(hub, steel, oven, 293.15).unwrap().with_rings(4).unwrap();
/// let (marks, wanted) = soak_to(&part, 453.15).unwrap();
/// assert!(wanted.unwrap().value < marks.to_90_percent.value);
/// assert!(soak_to(&part, 523.15).unwrap().1.is_none());
/// ```
pub fn soak_to(part: &Conduction, wanted: f64) -> Result<(Soak, Option<Estimate>), AssemblyError> {
    let share = (wanted - part.start()) / (part.surroundings_temperature() - part.start());
    let reached = share > 0.0 && share <= 0.999;
    let mut shares = vec![0.90, 0.95, 0.99];
    let place = shares.partition_point(|mark| *mark <= share);
    if reached {
        shares.insert(place, share);
    }
    let marks = shares.iter().map(|share| part.after(*share)).collect::<Result<Vec<_>, _>>()?;
    let (mut greatest_difference, mut greatest_difference_at) = (0.0, 0.0);
    let mut times = part.times_observed(&marks, |profile| {
        let difference = (profile.inner - profile.outer).abs();
        if difference > greatest_difference {
            (greatest_difference, greatest_difference_at) = (difference, profile.time);
        }
    })?;
    let there = Estimate { value: 0.0, mesh_correction: 0.0 };
    let to_wanted = if reached { Some(times.remove(place)) } else { (share <= 0.0).then_some(there) };
    let soak = Soak {
        to_90_percent: times[0],
        to_95_percent: times[1],
        to_99_percent: times[2],
        greatest_difference,
        greatest_difference_at,
    };
    Ok((soak, to_wanted))
}

/// Soak time of the old shop rule, s: one hour for every inch (25.4 mm) of section.
///
/// Source: ASM Handbook, Cold and Cryogenic Treatment of Steel (cold treatment); used for heating as well by
/// common practice, no source.
///
/// # Errors
/// [`AssemblyError::OutsideRange`].
///
/// # Example
/// ```
/// let rule = hubgrip::assembly::soak::hour_per_inch(0.0508).unwrap();
/// assert_eq!(rule.value, 7200.0);
/// ```
pub fn hour_per_inch(section: f64) -> Result<Sourced<f64>, AssemblyError> {
    positive("section (m)", section)?;
    Ok(Sourced::new(
        3600.0 * section / 0.0254,
        "one hour per inch of section: ASM Handbook, Cold and Cryogenic Treatment of Steel",
    ))
}

/// Thermal stress of a part that is heated or chilled quickly, Pa.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct QuenchStress {
    /// Greatest tension at the rim.
    pub rim_tension: f64,
    /// Greatest tension at the bore, or in the centre.
    pub inner_tension: f64,
    /// When the greater of the two occurs, s.
    pub at: f64,
}

impl QuenchStress {
    /// The greater tension, Pa.
    pub fn greatest(&self) -> f64 {
        self.rim_tension.max(self.inner_tension)
    }
}

/// Thermal stress in a long free cylinder while its temperature is uneven: an estimate for brittle parts.
///
/// σ_θ(surface) = σ_z(surface) = E/(1 − ν) (ε̄ − ε(surface)), with ε̄ the area mean of the expansion strain; in the
/// centre of a solid cylinder half of it in the hoop and the whole along the axis, of which the larger is given.
///
/// | symbol | meaning | unit | valid |
/// |---|---|---|---|
/// | E, ν | Young's modulus, Poisson's ratio | Pa, – | E > 0, −1 < ν < 0.5 |
/// | ε | expansion strain from 20 °C | – | the curve must cover both temperatures |
///
/// Assumes elastic behaviour with a constant E, a part long against its diameter (a short ring sees less: the
/// factor 1/(1 − ν) falls to 1) and no notches. The early peak of a very strong film lies within the first rings
/// of the mesh and is an estimate only. Compare with the tensile strength of a brittle material.
///
/// Source: S. P. Timoshenko and J. N. Goodier, *Theory of Elasticity*, chapter 13, the long circular cylinder.
///
/// # Errors
/// [`AssemblyError::OutsideCurve`] when the expansion does not cover both temperatures; as
/// [`Conduction::time_to_mean`].
pub fn quench_stress(
    part: &Conduction,
    youngs_modulus: f64,
    poisson: f64,
    expansion: &Expansion,
) -> Result<QuenchStress, AssemblyError> {
    positive("Young's modulus (Pa)", youngs_modulus)?;
    require(poisson > -1.0 && poisson < 0.5, "Poisson's ratio", poisson, "between −1 and 0.5")?;
    let (from, to) = expansion.range();
    for given in [part.start(), part.surroundings_temperature()] {
        if !(from..=to).contains(&given) {
            return Err(AssemblyError::OutsideCurve { part: "part", from, to, given });
        }
    }
    let strain = |temperature: f64| expansion.strain(temperature.clamp(from, to)).unwrap_or(f64::NAN);
    let stiffness = youngs_modulus / (1.0 - poisson);
    let mut worst = QuenchStress { rim_tension: 0.0, inner_tension: 0.0, at: 0.0 };
    part.follow(0.99, |grid, state| {
        let mean = grid.mean(&state.temperatures, strain);
        let rim = stiffness * (mean - strain(grid.outer(&state.temperatures)));
        let inner = stiffness * (mean - strain(grid.inner(&state.temperatures)));
        if rim.max(inner) > worst.greatest() {
            worst.at = state.time;
        }
        worst.rim_tension = worst.rim_tension.max(rim);
        worst.inner_tension = worst.inner_tension.max(inner);
    })?;
    Ok(worst)
}

#[cfg(test)]
mod tests {
    use super::super::conduction::{Body, Substance, Surroundings};
    use super::super::film::Film;
    use super::*;
    use approx::assert_relative_eq;

    fn bar(film: f64, surroundings: f64) -> Conduction {
        let body = Body { inner_diameter: 0.0, outer_diameter: 0.06, length: 1.0 };
        let steel = Substance::constant(50.0, 7800.0, 500.0).unwrap();
        let around = Surroundings {
            ends: Film::Insulated,
            ..Surroundings::all_round(surroundings, Film::Constant(film))
        };
        Conduction::new(body, steel, around, 293.15).unwrap()
    }

    /// First term of the series (Carslaw and Jaeger ch. VII): d 60 mm, h 100, k 50, x₁ = 0.34382835; the mean falls
    /// as exp(−κ x₁²t/b²) with the factor 4 Bi²/(x₁²(x₁² + Bi²)).
    #[test]
    fn marks_follow_the_first_term_of_the_series() {
        let soak = soak(&bar(100.0, 393.15)).unwrap();
        let (x, biot) = (0.343_828_35_f64, 0.06_f64);
        let rate = 50.0 / (7800.0 * 500.0) * (x / 0.03).powi(2);
        let factor = 4.0 * biot * biot / (x * x * (x * x + biot * biot));
        for (found, left) in
            [(soak.to_90_percent, 0.1), (soak.to_95_percent, 0.05), (soak.to_99_percent, 0.01)]
        {
            assert_relative_eq!(found.value, (factor / left).ln() / rate, max_relative = 1e-6);
        }
    }

    /// Upper bound at once after the quench: a thin skin takes the whole step, E α ΔT/(1 − ν); the mean stays behind.
    #[test]
    fn quench_stress_stays_below_that_of_a_sudden_skin() {
        let expansion = Expansion::from_mean(10e-6, 77.0, 700.0, "test").unwrap();
        let bound = 100e9 * 10e-6 * 100.0 / (1.0 - 0.25);
        let slow = quench_stress(&bar(100.0, 193.15), 100e9, 0.25, &expansion).unwrap();
        let fast = quench_stress(&bar(20_000.0, 193.15), 100e9, 0.25, &expansion).unwrap();
        assert!(slow.greatest() < fast.greatest() && fast.greatest() < bound);
        // Bi = 0.06, quasi-steady parabola: rim behind the mean by Bi/4 of the step, first term 0.9994 of it.
        assert_relative_eq!(slow.rim_tension / bound, 0.06 / 4.0, max_relative = 0.1);
    }

    #[test]
    fn heating_puts_the_centre_in_tension() {
        let expansion = Expansion::from_mean(10e-6, 77.0, 700.0, "test").unwrap();
        let hot = quench_stress(&bar(1000.0, 593.15), 100e9, 0.25, &expansion).unwrap();
        assert!(hot.inner_tension > hot.rim_tension);
        let short = Expansion::from_mean(10e-6, 250.0, 400.0, "test").unwrap();
        assert!(quench_stress(&bar(1000.0, 593.15), 100e9, 0.25, &short).is_err());
    }
}
