//! Transient conduction in a solid or hollow cylinder that is heated or chilled.
//!
//! Finite volumes over the radius and, when the ends exchange heat, over half the length; implicit in time.
//! Two meshes, the finer twice as fine, are combined by Richardson's extrapolation, and their difference is the
//! stated error of the mesh. The product of two one-dimensional solutions is not used: it holds only for
//! constant properties, while a boiling film and the specific heat of a chilled part change several-fold.
//!
//! Source: S. V. Patankar, *Numerical Heat Transfer and Fluid Flow*, Hemisphere 1980, chapters 3 and 4 (finite
//! volumes); P. J. Roache, *Verification and Validation in Computational Science and Engineering*, Hermosa 1998,
//! chapter 5 (Richardson's extrapolation).

use super::error::{AssemblyError, not_negative, positive, require};
use super::film::Film;
use super::grid::CylinderGrid;
use super::integrator::{HeatNetwork, Integration, State};
use super::property::Property;

/// A solid or hollow cylinder.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Body {
    /// Inner diameter, m; zero for a solid one.
    pub inner_diameter: f64,
    /// Outer diameter, m.
    pub outer_diameter: f64,
    /// Length, m.
    pub length: f64,
}

impl Body {
    /// Volume, m³.
    pub fn volume(&self) -> f64 {
        std::f64::consts::FRAC_PI_4
            * (self.outer_diameter.powi(2) - self.inner_diameter.powi(2))
            * self.length
    }

    pub(crate) fn check(&self) -> Result<(), AssemblyError> {
        not_negative("inner diameter (m)", self.inner_diameter)?;
        positive("wall of the cylinder (m)", self.outer_diameter - self.inner_diameter)?;
        positive("length (m)", self.length)?;
        Ok(())
    }
}

/// Thermal properties of a material.
#[derive(Debug, Clone, PartialEq)]
pub struct Substance {
    /// Conductivity, W/(m·K).
    pub conductivity: Property,
    /// Density, kg/m³, taken as constant.
    pub density: f64,
    /// Specific heat, J/(kg·K).
    pub specific_heat: Property,
}

impl Substance {
    /// Properties that do not change with temperature.
    ///
    /// # Errors
    /// [`AssemblyError::OutsideRange`] unless all are greater than zero.
    pub fn constant(conductivity: f64, density: f64, specific_heat: f64) -> Result<Self, AssemblyError> {
        Ok(Self {
            conductivity: Property::constant(conductivity)?,
            density: positive("density (kg/m³)", density)?,
            specific_heat: Property::constant(specific_heat)?,
        })
    }

    pub(crate) fn check(&self, one: f64, other: f64) -> Result<(), AssemblyError> {
        positive("density (kg/m³)", self.density)?;
        self.conductivity.covers(one, other)?;
        self.specific_heat.covers(one, other)
    }
}

/// What surrounds a part.
#[derive(Debug, Clone, PartialEq)]
pub struct Surroundings {
    /// Temperature, K.
    pub temperature: f64,
    /// Exchange at the bore; not used for a solid cylinder.
    pub inner: Film,
    /// Exchange at the rim.
    pub outer: Film,
    /// Exchange at both end faces; insulated for a long part.
    pub ends: Film,
}

impl Surroundings {
    /// The same exchange at every surface.
    pub fn all_round(temperature: f64, film: Film) -> Self {
        Self { temperature, inner: film.clone(), outer: film.clone(), ends: film }
    }
}

/// Temperatures of a part at one time, K.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Profile {
    /// Time since the start, s.
    pub time: f64,
    /// Volume mean. The bore and the rim of a free ring follow the area mean, not their own temperature.
    pub mean: f64,
    /// Bore, or centre of a solid cylinder, in the middle plane.
    pub inner: f64,
    /// Rim in the middle plane.
    pub outer: f64,
    /// Middle of the end face: its centre, or its edge at the bore.
    pub end: f64,
}

impl Profile {
    fn extrapolated(coarse: &Self, fine: &Self) -> Self {
        Self {
            time: fine.time,
            mean: richardson(coarse.mean, fine.mean),
            inner: richardson(coarse.inner, fine.inner),
            outer: richardson(coarse.outer, fine.outer),
            end: richardson(coarse.end, fine.end),
        }
    }
}

/// A number with the error that the mesh leaves in it, estimated from two meshes.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Estimate {
    /// The number.
    pub value: f64,
    /// A third of the difference between the two meshes, which the extrapolation removes to leading order.
    pub mesh_correction: f64,
}

/// A part that goes from one temperature into surroundings at another.
///
/// # Example
/// Half the step of a steel bar of 60 mm in a stirred bath:
/// ```
/// use hubgrip::assembly::conduction::{Body, Conduction, Substance, Surroundings};
/// use hubgrip::assembly::film::Film;
/// let body = Body { inner_diameter: 0.0, outer_diameter: 0.06, length: 1.0 };
/// let steel = Substance::constant(50.0, 7800.0, 500.0).unwrap();
/// let mut bath = Surroundings::all_round(293.15, Film::Constant(100.0));
/// bath.ends = Film::Insulated;
/// let cooling = Conduction::new(body, steel, bath, 393.15).unwrap();
/// let time = cooling.time_to_mean(343.15).unwrap().value;
/// assert!((time - 411.559782).abs() < 1e-3);
/// ```
#[derive(Debug, Clone, PartialEq)]
pub struct Conduction {
    body: Body,
    substance: Substance,
    surroundings: Surroundings,
    start: f64,
    rings: usize,
    tolerance: Option<f64>,
}

/// Rings of the coarser mesh when the ends are insulated and when they are not.
const RINGS: [usize; 2] = [48, 8];
/// Allowed error of a step as a share of the temperature step, in the same order.
const TOLERANCE: [f64; 2] = [1e-9, 1e-7];
/// The same for a boiling film, which itself is known to some tens of per cent.
const BOILING_TOLERANCE: f64 = 1e-5;
/// Longest time that is followed, in multiples of the lumped time constant.
const LONGEST: f64 = 60.0;

impl Conduction {
    /// A part at `start` (K) throughout that is put into `surroundings` at time zero.
    ///
    /// # Errors
    /// [`AssemblyError::OutsideRange`] for impossible numbers, [`AssemblyError::Table`] when a property curve does
    /// not cover both temperatures.
    pub fn new(
        body: Body,
        substance: Substance,
        surroundings: Surroundings,
        start: f64,
    ) -> Result<Self, AssemblyError> {
        body.check()?;
        positive("start temperature (K)", start)?;
        positive("temperature of the surroundings (K)", surroundings.temperature)?;
        require(
            start != surroundings.temperature,
            "start temperature (K)",
            start,
            "other than that of the surroundings",
        )?;
        substance.check(start, surroundings.temperature)?;
        for film in [&surroundings.inner, &surroundings.outer, &surroundings.ends] {
            film.check(start, surroundings.temperature)?;
        }
        let mut part = Self { body, substance, surroundings, start, rings: 0, tolerance: None };
        part.rings = RINGS[part.kind()];
        positive("heat flow at the start (W)", part.first_heat_flow().abs())?;
        Ok(part)
    }

    /// The same part with `rings` rings in the coarser mesh, at least two.
    ///
    /// The default is 48, or 8 rings of 8 cells when the ends exchange heat: enough for 1e-6 and 1e-5 of the step.
    ///
    /// # Errors
    /// [`AssemblyError::OutsideRange`].
    pub fn with_rings(self, rings: usize) -> Result<Self, AssemblyError> {
        require(rings >= 2, "number of rings", rings as f64, "two or more")?;
        Ok(Self { rings, ..self })
    }

    /// The same part with an allowed error of a step, as a share of the temperature step.
    ///
    /// The default is 1e-9 with insulated ends, 1e-7 with ends that exchange heat, and 1e-5 in boiling nitrogen.
    ///
    /// # Errors
    /// [`AssemblyError::OutsideRange`].
    pub fn with_tolerance(self, tolerance: f64) -> Result<Self, AssemblyError> {
        positive("allowed error of a step", tolerance)?;
        Ok(Self { tolerance: Some(tolerance), ..self })
    }

    /// The part.
    pub fn body(&self) -> &Body {
        &self.body
    }

    /// Temperature at the start, K.
    pub fn start(&self) -> f64 {
        self.start
    }

    /// Temperature of the surroundings, K.
    pub fn surroundings_temperature(&self) -> f64 {
        self.surroundings.temperature
    }

    /// Time until the volume mean reaches `target` (K), s.
    ///
    /// # Errors
    /// [`AssemblyError::NeverReached`] when the target does not lie between start and surroundings, or is so near
    /// to the surroundings that it takes more than 60 time constants.
    pub fn time_to_mean(&self, target: f64) -> Result<Estimate, AssemblyError> {
        Ok(self.times_to_means(&[target])?[0])
    }

    /// Times until the volume mean reaches each of `targets` (K), in the order in which they are passed, s.
    ///
    /// # Errors
    /// As [`Conduction::time_to_mean`].
    pub fn times_to_means(&self, targets: &[f64]) -> Result<Vec<Estimate>, AssemblyError> {
        self.times_observed(targets, |_| {})
    }

    /// As [`Conduction::times_to_means`], with every step of the finer mesh shown to `observe`.
    pub(crate) fn times_observed(
        &self,
        targets: &[f64],
        mut observe: impl FnMut(&Profile),
    ) -> Result<Vec<Estimate>, AssemblyError> {
        let coarse = self.passed(targets, self.rings, |_, _| {})?;
        let fine = self.passed(targets, 2 * self.rings, |grid, state| observe(&profile(grid, state)))?;
        Ok(coarse.iter().zip(&fine).map(|(coarse, fine)| estimate(*coarse, *fine)).collect())
    }

    /// Temperatures at `time` (s), extrapolated from two meshes.
    ///
    /// # Errors
    /// [`AssemblyError::OutsideRange`] for a time that is not greater than zero.
    pub fn profile_at(&self, time: f64) -> Result<Profile, AssemblyError> {
        positive("time (s)", time)?;
        let at = |rings| -> Result<Profile, AssemblyError> {
            let grid = self.grid(rings);
            let mut run = self.integration(&grid);
            run.run_until(|_| 1.0, time, |_| {})?;
            Ok(profile(&grid, &run.state))
        };
        Ok(Profile::extrapolated(&at(self.rings)?, &at(2 * self.rings)?))
    }

    /// Temperatures over time until the volume mean has covered `share` (0 to 1, not 1) of the step.
    ///
    /// The points are the steps of the finer mesh.
    ///
    /// # Errors
    /// As [`Conduction::time_to_mean`].
    pub fn history(&self, share: f64) -> Result<Vec<Profile>, AssemblyError> {
        let mut profiles = Vec::new();
        self.passed(&[self.after(share)?], 2 * self.rings, |grid, state| {
            profiles.push(profile(grid, state))
        })?;
        Ok(profiles)
    }

    /// Heat taken in from outside and heat stored, both J, when the volume mean has covered `share` of the step.
    ///
    /// The two are summed independently; they agree to 1e-6 of the heat stored.
    ///
    /// # Errors
    /// As [`Conduction::time_to_mean`].
    pub fn heat_balance(&self, share: f64) -> Result<(f64, f64), AssemblyError> {
        let mut balance = (0.0, 0.0);
        self.passed(&[self.after(share)?], 2 * self.rings, |grid, state| {
            let stored = (0..grid.cells())
                .map(|cell| grid.content(cell, state.temperatures[cell]) - grid.content(cell, self.start))
                .sum();
            balance = (state.exchanged, stored);
        })?;
        Ok(balance)
    }

    /// Temperature of the mean when it has covered `share` of the step, K.
    ///
    /// # Errors
    /// [`AssemblyError::OutsideRange`] for a share that is not between 0 and 1.
    pub fn after(&self, share: f64) -> Result<f64, AssemblyError> {
        require(share > 0.0 && share < 1.0, "share of the temperature step", share, "between 0 and 1")?;
        Ok(self.start + share * (self.surroundings.temperature - self.start))
    }

    /// Greatest values over time of a quantity made from the cells, followed to `share` of the step.
    pub(crate) fn follow(
        &self,
        share: f64,
        observe: impl FnMut(&CylinderGrid, &State),
    ) -> Result<(), AssemblyError> {
        self.passed(&[self.after(share)?], 2 * self.rings, observe).map(|_| ())
    }

    fn passed(
        &self,
        targets: &[f64],
        rings: usize,
        mut observe: impl FnMut(&CylinderGrid, &State),
    ) -> Result<Vec<f64>, AssemblyError> {
        let grid = self.grid(rings);
        let mut run = self.integration(&grid);
        let limit = LONGEST * self.time_constant();
        let direction = (self.start - self.surroundings.temperature).signum();
        targets
            .iter()
            .map(|&target| {
                let never = AssemblyError::NeverReached {
                    start: self.start,
                    surroundings: self.surroundings.temperature,
                    wanted: target,
                };
                let within = direction * (self.start - target) >= 0.0
                    && direction * (target - self.surroundings.temperature) > 0.0;
                if !within {
                    return Err(never);
                }
                run.run_until(
                    |state| direction * (grid.mean(&state.temperatures, |t| t) - target),
                    limit,
                    |state| observe(&grid, state),
                )?
                .ok_or(never)
            })
            .collect()
    }

    fn grid(&self, rings: usize) -> CylinderGrid<'_> {
        let layers = [1, rings][self.kind()];
        CylinderGrid::new(&self.body, &self.substance, &self.surroundings, rings, layers)
    }

    fn integration<'a>(&self, grid: &'a CylinderGrid<'a>) -> Integration<'a, CylinderGrid<'a>> {
        let temperatures = vec![self.start; grid.cells()];
        let width = (self.body.outer_diameter - self.body.inner_diameter) / (4.0 * self.rings as f64);
        let diffusivity = self.substance.conductivity.value_held(self.start)
            / (self.substance.density * self.substance.specific_heat.value_held(self.start));
        let step = 0.1 * width * width / diffusivity;
        let scale = (self.start - self.surroundings.temperature).abs();
        Integration::new(
            grid,
            State { time: 0.0, temperatures, exchanged: 0.0 },
            step,
            self.tolerance() * scale,
        )
    }

    /// 0 when the ends are insulated, 1 when they exchange heat.
    fn kind(&self) -> usize {
        usize::from(self.surroundings.ends != Film::Insulated)
    }

    fn tolerance(&self) -> f64 {
        if let Some(tolerance) = self.tolerance {
            return tolerance;
        }
        let films = [&self.surroundings.inner, &self.surroundings.outer, &self.surroundings.ends];
        if films.iter().any(|film| matches!(film, Film::NitrogenPool(_))) {
            BOILING_TOLERANCE
        } else {
            TOLERANCE[self.kind()]
        }
    }

    fn first_heat_flow(&self) -> f64 {
        let grid = self.grid(4);
        grid.exchange(&vec![self.start; grid.cells()])
    }

    /// Heat content of the step over the first heat flow, with the internal resistance of the wall added, s.
    fn time_constant(&self) -> f64 {
        let (one, other) = (self.start, self.surroundings.temperature);
        let content =
            (self.substance.specific_heat.content(one) - self.substance.specific_heat.content(other)).abs()
                * self.substance.density;
        let stored = content * self.body.volume();
        let radius = self.body.outer_diameter / 2.0;
        let conductivity = self.substance.conductivity.value_held(other);
        stored / self.first_heat_flow().abs()
            + content * radius * radius / ((one - other).abs() * conductivity)
    }
}

/// Time of a part that has the same temperature throughout, s.
///
/// t = ρ c V / (Σ h A) · ln((T_0 − T_∞)/(T − T_∞))
///
/// | symbol | meaning | unit | valid |
/// |---|---|---|---|
/// | ρ, c | density, specific heat | kg/m³, J/(kg·K) | > 0 |
/// | V | volume | m³ | > 0 |
/// | Σ h A | film coefficient times area, summed over the surfaces | W/K | > 0 |
/// | T_0, T, T_∞ | start, target, surroundings | K | T between T_0 and T_∞ |
///
/// Holds while the Biot number h V/(A k) is below 0.1; then the centre stays within a few per cent of the surface.
///
/// Source: F. P. Incropera and D. P. DeWitt, *Fundamentals of Heat and Mass Transfer*, section 5.1.
///
/// # Errors
/// [`AssemblyError::OutsideRange`] or [`AssemblyError::NeverReached`].
///
/// # Example
/// ```
/// use hubgrip::assembly::conduction::lumped_time;
/// // Rod of 10 mm, 1 m long, 593 K into 393 K, until 473 K.
/// let (volume, area) = (7.853982e-5, 3.1415927e-2);
/// let time = lumped_time(7800.0, 460.0, volume, 100.0 * area, 593.0, 473.0, 393.0).unwrap();
/// assert!((time - 82.19).abs() < 0.01);
/// ```
pub fn lumped_time(
    density: f64,
    specific_heat: f64,
    volume: f64,
    exchange: f64,
    start: f64,
    target: f64,
    surroundings: f64,
) -> Result<f64, AssemblyError> {
    positive("density (kg/m³)", density)?;
    positive("specific heat (J/(kg·K))", specific_heat)?;
    positive("volume (m³)", volume)?;
    positive("film coefficient times area (W/K)", exchange)?;
    let ratio = (start - surroundings) / (target - surroundings);
    if !(ratio >= 1.0 && ratio.is_finite()) {
        return Err(AssemblyError::NeverReached { start, surroundings, wanted: target });
    }
    Ok(density * specific_heat * volume / exchange * ratio.ln())
}

fn profile(grid: &CylinderGrid, state: &State) -> Profile {
    Profile {
        time: state.time,
        mean: grid.mean(&state.temperatures, |t| t),
        inner: grid.inner(&state.temperatures),
        outer: grid.outer(&state.temperatures),
        end: grid.end(&state.temperatures),
    }
}

/// Value at mesh width zero of a quantity whose error falls with the square of the width.
fn richardson(coarse: f64, fine: f64) -> f64 {
    fine + (fine - coarse) / 3.0
}

fn estimate(coarse: f64, fine: f64) -> Estimate {
    Estimate { value: richardson(coarse, fine), mesh_correction: ((fine - coarse) / 3.0).abs() }
}
