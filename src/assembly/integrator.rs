//! Implicit time integration of a network of heat-storing cells.
//!
//! The heat content of the cells, not their temperature, is carried forward, so that energy is conserved for
//! any specific heat. The method is the L-stable diagonally implicit Runge–Kutta method of order 4 with five
//! stages and an embedded third-order solution for the step control.
//!
//! Source: E. Hairer and G. Wanner, *Solving Ordinary Differential Equations II*, 2nd ed., Springer 1996,
//! section IV.6, table 6.5 (coefficients) and section IV.8 (filtered error estimate).

use super::error::AssemblyError;
use super::film::Surface;
use crate::numerics::root::bracketed;

/// Cells that store heat and pass it on.
pub(crate) trait HeatNetwork {
    /// Number of cells.
    fn cells(&self) -> usize;
    /// Greatest difference of index between cells that exchange heat.
    fn bandwidth(&self) -> usize;
    /// Heat content of a cell at a temperature, J, counted from any fixed state.
    fn content(&self, cell: usize, temperature: f64) -> f64;
    /// Slope of the content, J/K.
    fn capacity(&self, cell: usize, temperature: f64) -> f64;
    /// Visits every pair of cells that exchange heat, with the conductance between them, W/K.
    fn for_each_link(&self, temperatures: &[f64], visit: &mut dyn FnMut(usize, usize, f64));
    /// Visits every surface to the outside with its cell and its area, m².
    fn for_each_surface(&self, temperatures: &[f64], visit: &mut dyn FnMut(usize, f64, Surface));

    /// Heat flowing into each cell, W.
    fn inflow(&self, temperatures: &[f64], inflow: &mut [f64]) {
        inflow.fill(0.0);
        self.for_each_link(temperatures, &mut |one, other, conductance| {
            let heat = conductance * (temperatures[other] - temperatures[one]);
            inflow[one] += heat;
            inflow[other] -= heat;
        });
        self.for_each_surface(temperatures, &mut |cell, area, surface| {
            inflow[cell] -= area * surface.heat_flux;
        });
    }

    /// Slope of the inflow of each cell against the temperature of each cell, added to `matrix` times `factor`.
    fn add_slope(&self, temperatures: &[f64], factor: f64, matrix: &mut Banded) {
        self.for_each_link(temperatures, &mut |one, other, conductance| {
            let value = factor * conductance;
            matrix.add(one, one, -value);
            matrix.add(other, other, -value);
            matrix.add(one, other, value);
            matrix.add(other, one, value);
        });
        self.for_each_surface(temperatures, &mut |cell, area, surface| {
            matrix.add(cell, cell, -factor * area * surface.slope);
        });
    }

    /// Heat flowing in from outside the network, W.
    fn exchange(&self, temperatures: &[f64]) -> f64 {
        let mut heat = 0.0;
        self.for_each_surface(temperatures, &mut |_, area, surface| heat -= area * surface.heat_flux);
        heat
    }
}

/// Square matrix with entries near its diagonal only.
pub(crate) struct Banded {
    size: usize,
    half: usize,
    entries: Vec<f64>,
}

impl Banded {
    pub(crate) fn new(size: usize, half: usize) -> Self {
        Self { size, half, entries: vec![0.0; size * (2 * half + 1)] }
    }

    pub(crate) fn add(&mut self, row: usize, column: usize, value: f64) {
        let at = self.at(row, column);
        self.entries[at] += value;
    }

    fn at(&self, row: usize, column: usize) -> usize {
        row * (2 * self.half + 1) + column + self.half - row
    }

    /// Factors the matrix in place without exchange of rows; the matrices here are diagonally dominant.
    fn factor(&mut self) {
        for pivot in 0..self.size {
            let last = (pivot + self.half).min(self.size - 1);
            let diagonal = self.entries[self.at(pivot, pivot)];
            for row in pivot + 1..=last {
                let left = self.at(row, pivot);
                let share = self.entries[left] / diagonal;
                self.entries[left] = share;
                if share != 0.0 {
                    for column in pivot + 1..=last {
                        let above = self.entries[self.at(pivot, column)];
                        let here = self.at(row, column);
                        self.entries[here] -= share * above;
                    }
                }
            }
        }
    }

    /// Solves with the factors, in place.
    fn solve(&self, vector: &mut [f64]) {
        for row in 0..self.size {
            for column in row.saturating_sub(self.half)..row {
                vector[row] -= self.entries[self.at(row, column)] * vector[column];
            }
        }
        for row in (0..self.size).rev() {
            for column in row + 1..=(row + self.half).min(self.size - 1) {
                vector[row] -= self.entries[self.at(row, column)] * vector[column];
            }
            vector[row] /= self.entries[self.at(row, row)];
        }
    }
}

const STAGES: usize = 5;
const DIAGONAL: f64 = 0.25;
const STAGE_WEIGHTS: [[f64; STAGES]; STAGES] = [
    [0.25, 0.0, 0.0, 0.0, 0.0],
    [0.5, 0.25, 0.0, 0.0, 0.0],
    [17.0 / 50.0, -1.0 / 25.0, 0.25, 0.0, 0.0],
    [371.0 / 1360.0, -137.0 / 2720.0, 15.0 / 544.0, 0.25, 0.0],
    [25.0 / 24.0, -49.0 / 48.0, 125.0 / 16.0, -85.0 / 12.0, 0.25],
];
const EMBEDDED: [f64; STAGES] = [59.0 / 48.0, -17.0 / 96.0, 225.0 / 32.0, -85.0 / 12.0, 0.0];

const MAX_NEWTON: usize = 14;
const MAX_STEPS: usize = 200_000;
/// Shortest step that is still halved to find an event, s.
const LEAST_STEP: f64 = 1e-9;

/// State of an integration.
#[derive(Debug, Clone)]
pub(crate) struct State {
    /// Time, s.
    pub(crate) time: f64,
    /// Temperature of each cell, K.
    pub(crate) temperatures: Vec<f64>,
    /// Heat taken in from outside since the start, J.
    pub(crate) exchanged: f64,
}

/// Integration of one network.
pub(crate) struct Integration<'a, N: HeatNetwork> {
    network: &'a N,
    /// Allowed error of a step, K.
    tolerance: f64,
    step: f64,
    pub(crate) state: State,
}

struct Stepped {
    state: State,
    /// Estimated error of the step, K.
    error: f64,
}

impl<'a, N: HeatNetwork> Integration<'a, N> {
    /// Starts from `state` with a first step of `step` seconds and an allowed error per step in K.
    pub(crate) fn new(network: &'a N, state: State, step: f64, tolerance: f64) -> Self {
        Self { network, tolerance, step, state }
    }

    /// Runs until `event` of the state changes from positive to zero or below, or to `limit` seconds.
    ///
    /// `observe` sees the state at the start, after every step and at the end. Returns the time of the event;
    /// none when the limit came first.
    pub(crate) fn run_until(
        &mut self,
        event: impl Fn(&State) -> f64,
        limit: f64,
        mut observe: impl FnMut(&State),
    ) -> Result<Option<f64>, AssemblyError> {
        observe(&self.state);
        if event(&self.state) <= 0.0 {
            return Ok(Some(self.state.time));
        }
        for _ in 0..MAX_STEPS {
            let rest = limit - self.state.time;
            if rest <= limit.abs() * 4.0 * f64::EPSILON {
                return Ok(None);
            }
            let next = self.accepted_step(rest)?;
            if event(&next) <= 0.0 {
                let length = next.time - self.state.time;
                match self.state_at_event(&event, length) {
                    Ok(state) => self.state = state,
                    // A part of the step need not converge where the whole did: come nearer in shorter steps.
                    Err(_) if length > LEAST_STEP => {
                        self.step = 0.5 * length;
                        continue;
                    }
                    Err(error) => return Err(error),
                }
                observe(&self.state);
                return Ok(Some(self.state.time));
            }
            self.state = next;
            observe(&self.state);
        }
        Err(AssemblyError::NotSettled { time: self.state.time })
    }

    /// One step no longer than `longest`, with the error below the tolerance; sets the length of the next one.
    fn accepted_step(&mut self, longest: f64) -> Result<State, AssemblyError> {
        loop {
            let length = self.step.min(longest);
            let tried = self.stepped(length);
            let error = tried.as_ref().map_or(f64::INFINITY, |stepped| stepped.error);
            let ratio = error / self.tolerance;
            let change = if ratio.is_finite() { (0.9 * ratio.powf(-0.25)).clamp(0.2, 4.0) } else { 0.25 };
            if let Some(stepped) = tried
                && ratio <= 1.0
            {
                if length == self.step || change < 1.0 {
                    self.step = length * change;
                }
                return Ok(stepped.state);
            }
            self.step = length * change.min(0.9);
            if self.step <= self.state.time.abs() * 1e-14 || self.step < 1e-12 {
                return Err(AssemblyError::NotSettled { time: self.state.time });
            }
        }
    }

    /// The state inside a step of `length` at which the event happens, by repeating the step with other lengths.
    fn state_at_event(&self, event: &impl Fn(&State) -> f64, length: f64) -> Result<State, AssemblyError> {
        let after = |dt: f64| {
            if dt == 0.0 { Some(self.state.clone()) } else { self.stepped(dt).map(|stepped| stepped.state) }
        };
        let value = |dt: f64| after(dt).map_or(f64::NAN, |state| event(&state));
        let dt = bracketed(value, 0.0, length, length * 1e-12)?;
        after(dt).ok_or(AssemblyError::NotSettled { time: self.state.time })
    }

    /// One step of `dt` seconds; none when the stage equations did not converge.
    fn stepped(&self, dt: f64) -> Option<Stepped> {
        let (network, cells) = (self.network, self.network.cells());
        let start = &self.state.temperatures;
        let contents: Vec<f64> = (0..cells).map(|cell| network.content(cell, start[cell])).collect();
        let mut matrix = self.factored(start, dt);
        let mut flows: Vec<Vec<f64>> = Vec::with_capacity(STAGES);
        let mut temperatures = start.clone();
        let mut exchanged = 0.0;
        for (weights, last_weight) in STAGE_WEIGHTS.iter().zip(STAGE_WEIGHTS[STAGES - 1]) {
            let known: Vec<f64> = (0..cells)
                .map(|cell| {
                    let earlier: f64 = flows.iter().zip(weights).map(|(flow, w)| w * flow[cell]).sum();
                    contents[cell] + dt * earlier
                })
                .collect();
            self.solve_stage(&known, dt, &mut matrix, &mut temperatures)?;
            flows.push(
                (0..cells)
                    .map(|cell| (network.content(cell, temperatures[cell]) - known[cell]) / (dt * DIAGONAL))
                    .collect(),
            );
            exchanged += dt * last_weight * network.exchange(&temperatures);
        }
        let mut error: Vec<f64> = (0..cells)
            .map(|cell| {
                let differences = flows.iter().zip(STAGE_WEIGHTS[STAGES - 1]).zip(EMBEDDED);
                dt * differences.map(|((flow, full), embedded)| (full - embedded) * flow[cell]).sum::<f64>()
            })
            .collect();
        matrix.solve(&mut error);
        let error = error.iter().fold(0.0_f64, |greatest, e| greatest.max(e.abs()));
        let state =
            State { time: self.state.time + dt, temperatures, exchanged: self.state.exchanged + exchanged };
        error.is_finite().then_some(Stepped { state, error })
    }

    fn factored(&self, temperatures: &[f64], dt: f64) -> Banded {
        let mut matrix = Banded::new(self.network.cells(), self.network.bandwidth());
        for (cell, &temperature) in temperatures.iter().enumerate() {
            matrix.add(cell, cell, self.network.capacity(cell, temperature));
        }
        self.network.add_slope(temperatures, -dt * DIAGONAL, &mut matrix);
        matrix.factor();
        matrix
    }

    /// Newton's method for one stage, with the factors of the step and, once, with fresh ones.
    fn solve_stage(
        &self,
        known: &[f64],
        dt: f64,
        matrix: &mut Banded,
        temperatures: &mut [f64],
    ) -> Option<()> {
        let mut inflow = vec![0.0; temperatures.len()];
        let enough = 1e-3 * self.tolerance;
        for refreshed in [false, true] {
            if refreshed {
                *matrix = self.factored(temperatures, dt);
            }
            let mut last = f64::INFINITY;
            for _ in 0..MAX_NEWTON {
                self.network.inflow(temperatures, &mut inflow);
                let mut change: Vec<f64> = (0..temperatures.len())
                    .map(|cell| {
                        known[cell] + dt * DIAGONAL * inflow[cell]
                            - self.network.content(cell, temperatures[cell])
                    })
                    .collect();
                matrix.solve(&mut change);
                let greatest = change.iter().fold(0.0_f64, |greatest, c| greatest.max(c.abs()));
                if !greatest.is_finite() {
                    return None;
                }
                temperatures.iter_mut().zip(&change).for_each(|(t, c)| *t += c);
                if greatest <= enough {
                    return Some(());
                }
                if greatest > 2.0 * last {
                    break;
                }
                last = greatest;
            }
        }
        None
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    /// One lump in surroundings at 0: dT/dt = −r T, or with the heat content T + T²/2 for a known non-linear case.
    struct Lump {
        rate: f64,
        curved: bool,
    }

    impl HeatNetwork for Lump {
        fn cells(&self) -> usize {
            1
        }
        fn bandwidth(&self) -> usize {
            0
        }
        fn content(&self, _: usize, t: f64) -> f64 {
            if self.curved { t + 0.5 * t * t } else { t }
        }
        fn capacity(&self, _: usize, t: f64) -> f64 {
            if self.curved { 1.0 + t } else { 1.0 }
        }
        fn for_each_link(&self, _: &[f64], _: &mut dyn FnMut(usize, usize, f64)) {}
        fn for_each_surface(&self, t: &[f64], visit: &mut dyn FnMut(usize, f64, Surface)) {
            visit(0, 1.0, Surface { temperature: t[0], heat_flux: self.rate * t[0], slope: self.rate });
        }
    }

    fn start() -> State {
        State { time: 0.0, temperatures: vec![1.0], exchanged: 0.0 }
    }

    #[test]
    fn order_of_convergence_is_four() {
        let lump = Lump { rate: 1.0, curved: false };
        let error = |steps: u32| {
            let dt = 1.0 / f64::from(steps);
            let mut run = Integration::new(&lump, start(), dt, 1e-12);
            for _ in 0..steps {
                run.state = run.stepped(dt).unwrap().state;
            }
            (run.state.temperatures[0] - (-1.0_f64).exp()).abs()
        };
        let order = (error(4) / error(8)).log2();
        assert!((order - 4.0).abs() < 0.2, "order {order}");
    }

    #[test]
    fn non_linear_heat_content_follows_its_exact_solution() {
        // (1 + T) dT/dt = −T: ln T + T = 1 − t. At T = 0.25, t = 1 − 0.25 − ln 0.25.
        let lump = Lump { rate: 1.0, curved: true };
        let mut run = Integration::new(&lump, start(), 1e-3, 1e-9);
        let time = run.run_until(|state| state.temperatures[0] - 0.25, 100.0, |_| {}).unwrap().unwrap();
        assert_relative_eq!(time, 0.75 + 4.0_f64.ln(), max_relative = 1e-8);
        let lost = lump.content(0, 0.25) - lump.content(0, 1.0);
        assert_relative_eq!(run.state.exchanged, lost, max_relative = 1e-9);
    }

    #[test]
    fn stops_at_the_limit_exactly() {
        let lump = Lump { rate: 0.3, curved: false };
        let mut run = Integration::new(&lump, start(), 1e-3, 1e-9);
        assert_eq!(run.run_until(|_| 1.0, 2.0, |_| {}).unwrap(), None);
        assert_relative_eq!(run.state.time, 2.0, max_relative = 1e-14);
        assert_relative_eq!(run.state.temperatures[0], (-0.6_f64).exp(), max_relative = 1e-8);
    }

    #[test]
    fn banded_factors_solve_a_dense_system() {
        let mut matrix = Banded::new(5, 2);
        let dense = |i: usize, j: usize| {
            if i == j {
                10.0 + i as f64
            } else if i.abs_diff(j) <= 2 {
                1.0 / (1.0 + (i + 2 * j) as f64)
            } else {
                0.0
            }
        };
        let exact = [1.0, -2.0, 3.0, 0.5, 4.0];
        let mut right: Vec<f64> = (0..5).map(|i| (0..5).map(|j| dense(i, j) * exact[j]).sum()).collect();
        for i in 0..5_usize {
            for j in i.saturating_sub(2)..=(i + 2).min(4) {
                matrix.add(i, j, dense(i, j));
            }
        }
        matrix.factor();
        matrix.solve(&mut right);
        for (found, wanted) in right.iter().zip(exact) {
            assert_relative_eq!(*found, wanted, max_relative = 1e-13);
        }
    }
}
