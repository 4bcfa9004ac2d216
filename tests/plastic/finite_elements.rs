//! A second method: the hub as linear finite elements along the radius, loaded step by step with an implicit return
//! to the yield surface. It shares no formula with the closed forms; forces are per radian and unit of length.

/// Radial and hoop component of a stress or strain.
pub type Pair = [f64; 2];
type Matrix = [Pair; 2];

/// Perfectly plastic material in plane stress.
#[derive(Clone, Copy)]
pub struct Material {
    pub youngs_modulus: f64,
    pub poisson: f64,
    pub yield_value: f64,
    pub surface: Surface,
}

/// Yield surface.
#[derive(Clone, Copy, PartialEq)]
pub enum Surface {
    VonMises,
    /// The hexagon of greatest shear stress, all six faces.
    Tresca,
}

impl Material {
    fn elastic(&self) -> Matrix {
        let factor = self.youngs_modulus / (1.0 - self.poisson * self.poisson);
        [[factor, self.poisson * factor], [self.poisson * factor, factor]]
    }

    /// Stress nearest to the trial stress in the energy norm, and its derivative by the strain.
    fn returned(&self, trial: Pair) -> (Pair, Matrix) {
        match self.surface {
            Surface::VonMises => self.onto_ellipse(trial),
            Surface::Tresca => self.onto_hexagon(trial),
        }
    }

    /// J. C. Simo and R. L. Taylor, International Journal for Numerical Methods in Engineering 22 (1986) 649-670,
    /// in the axes s = (σφ + σr)/√2 and d = (σφ − σr)/√2, where 2 σv² = s² + 3 d².
    fn onto_ellipse(&self, trial: Pair) -> (Pair, Matrix) {
        let root = 0.5_f64.sqrt();
        let (s0, d0) = (root * (trial[0] + trial[1]), root * (trial[1] - trial[0]));
        let (bulk, shear) =
            (self.youngs_modulus / (1.0 - self.poisson), self.youngs_modulus / (1.0 + self.poisson));
        let limit = 2.0 * self.yield_value * self.yield_value;
        if s0 * s0 + 3.0 * d0 * d0 <= limit {
            return (trial, self.elastic());
        }
        let mut gamma = 0.0;
        for _ in 0..60 {
            let (s, d) = (s0 / (1.0 + gamma * bulk), d0 / (1.0 + 3.0 * gamma * shear));
            let value = s * s + 3.0 * d * d - limit;
            let slope = -2.0 * s * s * bulk / (1.0 + gamma * bulk)
                - 18.0 * d * d * shear / (1.0 + 3.0 * gamma * shear);
            if value <= 1e-14 * limit {
                break;
            }
            gamma -= value / slope;
        }
        let (s, d) = (s0 / (1.0 + gamma * bulk), d0 / (1.0 + 3.0 * gamma * shear));
        let (hs, hd) = (bulk / (1.0 + gamma * bulk), shear / (1.0 + 3.0 * gamma * shear));
        let (ns, nd) = (hs * s, hd * 3.0 * d);
        let weight = ns * s + nd * 3.0 * d;
        let (ss, dd, sd) = (hs - ns * ns / weight, hd - nd * nd / weight, -ns * nd / weight);
        let tangent = [[0.5 * (ss + dd) - sd, 0.5 * (ss - dd)], [0.5 * (ss - dd), 0.5 * (ss + dd) + sd]];
        ([root * (s - d), root * (s + d)], tangent)
    }

    fn onto_hexagon(&self, trial: Pair) -> (Pair, Matrix) {
        const FACES: [Pair; 6] = [[-1.0, 1.0], [0.0, 1.0], [1.0, 0.0], [1.0, -1.0], [0.0, -1.0], [-1.0, 0.0]];
        const CORNERS: [Pair; 6] =
            [[0.0, 1.0], [1.0, 1.0], [1.0, 0.0], [0.0, -1.0], [-1.0, -1.0], [-1.0, 0.0]];
        let limit = self.yield_value;
        let inside = |stress: Pair| FACES.iter().all(|face| dot(*face, stress) <= limit * (1.0 + 1e-13));
        let elastic = self.elastic();
        if inside(trial) {
            return (trial, elastic);
        }
        for face in FACES.into_iter().filter(|face| dot(*face, trial) > limit) {
            let flow = times(elastic, face);
            let stiffness = dot(face, flow);
            let back = (dot(face, trial) - limit) / stiffness;
            let stress = [trial[0] - back * flow[0], trial[1] - back * flow[1]];
            if inside(stress) {
                let mut tangent = elastic;
                for i in 0..2 {
                    for j in 0..2 {
                        tangent[i][j] -= flow[i] * flow[j] / stiffness;
                    }
                }
                return (stress, tangent);
            }
        }
        let distance = |corner: &Pair| {
            let gap = [trial[0] - limit * corner[0], trial[1] - limit * corner[1]];
            gap[0] * gap[0] + gap[1] * gap[1] - 2.0 * self.poisson * gap[0] * gap[1]
        };
        let nearest = CORNERS.into_iter().min_by(|one, other| distance(one).total_cmp(&distance(other)));
        let corner = nearest.expect("a hexagon has corners");
        // In a corner the tangent is zero; a little stiffness keeps the iteration going and leaves the stress alone.
        ([limit * corner[0], limit * corner[1]], elastic.map(|row| row.map(|entry| 1e-3 * entry)))
    }
}

/// What is prescribed at the bore.
#[derive(Clone, Copy)]
pub enum Bore {
    /// Radial displacement, m.
    Displacement(f64),
    /// Pressure, Pa.
    Pressure(f64),
}

/// The hub from its bore to its rim.
pub struct Hub {
    material: Material,
    radii: Vec<f64>,
    displacements: Vec<f64>,
    /// Stress at the two Gauss points of each element, at the end of the last step.
    stresses: Vec<[Pair; 2]>,
    /// Increment of the displacements in the last step, the first guess of the next.
    last_increment: Vec<f64>,
    work: f64,
}

impl Hub {
    pub fn new(material: Material, inner: f64, outer: f64, elements: usize) -> Self {
        let radii =
            (0..=elements).map(|i| inner * (outer / inner).powf(i as f64 / elements as f64)).collect();
        let stresses = vec![[[0.0; 2]; 2]; elements];
        Self {
            material,
            radii,
            displacements: vec![0.0; elements + 1],
            stresses,
            last_increment: vec![0.0; elements + 1],
            work: 0.0,
        }
    }

    pub fn bore_displacement(&self) -> f64 {
        self.displacements[0]
    }

    pub fn rim_displacement(&self) -> f64 {
        self.displacements[self.displacements.len() - 1]
    }

    /// Pressure at the bore, from the force on its node.
    pub fn pressure(&self) -> f64 {
        let still = vec![0.0; self.radii.len()];
        self.respond(&still).force[0] / self.radii[0]
    }

    /// Work of the bore pressure so far, per radian and length, by the trapezoidal rule over the steps.
    pub fn work(&self) -> f64 {
        self.work
    }

    /// Radius and stress at every Gauss point.
    pub fn stresses(&self) -> impl Iterator<Item = (f64, Pair)> {
        self.stresses.iter().enumerate().flat_map(move |(element, pair)| {
            (0..2).map(move |point| (self.place(element, point).0, pair[point]))
        })
    }

    /// Goes to a state at the bore in equal steps.
    pub fn go(&mut self, from: Bore, to: Bore, steps: usize) {
        self.last_increment.fill(0.0);
        for step in 1..=steps {
            let share = step as f64 / steps as f64;
            let between = |start: f64, end: f64| start + (end - start) * share;
            let before = (self.pressure(), self.bore_displacement());
            match (from, to) {
                (Bore::Displacement(start), Bore::Displacement(end)) => {
                    self.step(Bore::Displacement(between(start, end)));
                }
                (Bore::Pressure(start), Bore::Pressure(end)) => {
                    self.step(Bore::Pressure(between(start, end)))
                }
                _ => panic!("a path keeps to one kind of control"),
            }
            let moved = self.bore_displacement() - before.1;
            self.work += 0.5 * (self.pressure() + before.0) * moved * self.radii[0];
        }
    }

    fn step(&mut self, bore: Bore) {
        let mut increment = self.last_increment.clone();
        let scale = self.material.yield_value * self.radii[0];
        for _ in 0..200 {
            let response = self.respond(&increment);
            let mut unbalanced: Vec<f64> = response.force.iter().map(|force| -force).collect();
            let (mut below, mut diagonal, mut above) =
                (response.coupling.clone(), response.diagonal, response.coupling);
            match bore {
                Bore::Pressure(pressure) => unbalanced[0] += pressure * self.radii[0],
                Bore::Displacement(displacement) => {
                    let missing = displacement - self.displacements[0] - increment[0];
                    unbalanced[0] = missing;
                    diagonal[0] = 1.0;
                    above[0] = 0.0;
                    unbalanced[1] -= below[0] * missing;
                    below[0] = 0.0;
                }
            }
            let rest = unbalanced.iter().skip(1).fold(0.0, |most: f64, force| most.max(force.abs()));
            let settled = match bore {
                Bore::Pressure(_) => rest.max(unbalanced[0].abs()) < 1e-10 * scale,
                Bore::Displacement(_) => {
                    rest.max(unbalanced[0].abs() * self.material.youngs_modulus) < 1e-10 * scale
                }
            };
            assert!(unbalanced.iter().all(|force| force.is_finite()), "the elements diverge");
            if settled {
                self.displacements.iter_mut().zip(&increment).for_each(|(total, part)| *total += part);
                self.stresses = response.stresses;
                self.last_increment = increment;
                return;
            }
            let correction = tridiagonal(&below, &mut diagonal, &above, unbalanced);
            increment.iter_mut().zip(correction).for_each(|(total, part)| *total += part);
        }
        panic!("no equilibrium");
    }

    /// Forces, stiffness and stresses for an increment of the displacements.
    fn respond(&self, increment: &[f64]) -> Response {
        let nodes = self.radii.len();
        let mut response = Response {
            force: vec![0.0; nodes],
            diagonal: vec![0.0; nodes],
            coupling: vec![0.0; nodes - 1],
            stresses: self.stresses.clone(),
        };
        let elastic = self.material.elastic();
        for element in 0..nodes - 1 {
            for point in 0..2 {
                let (radius, weight, shapes) = self.place(element, point);
                let strain = [0, 1].map(|row: usize| {
                    shapes[0][row] * increment[element] + shapes[1][row] * increment[element + 1]
                });
                let change = times(elastic, strain);
                let start = self.stresses[element][point];
                let (stress, tangent) = self.material.returned([start[0] + change[0], start[1] + change[1]]);
                response.stresses[element][point] = stress;
                let volume = weight * radius;
                for (node, shape) in shapes.into_iter().enumerate() {
                    response.force[element + node] += volume * dot(shape, stress);
                    response.diagonal[element + node] += volume * dot(shape, times(tangent, shape));
                }
                response.coupling[element] += volume * dot(shapes[0], times(tangent, shapes[1]));
            }
        }
        response
    }

    /// Radius, weight, and strain by the displacement of each of the two nodes, at a Gauss point.
    fn place(&self, element: usize, point: usize) -> (f64, f64, [Pair; 2]) {
        let (start, end) = (self.radii[element], self.radii[element + 1]);
        let length = end - start;
        let side = if point == 0 { -1.0 } else { 1.0 };
        let share = 0.5 * (1.0 + side / 3.0_f64.sqrt());
        let radius = start + share * length;
        let shapes = [[-1.0 / length, (1.0 - share) / radius], [1.0 / length, share / radius]];
        (radius, 0.5 * length, shapes)
    }
}

struct Response {
    force: Vec<f64>,
    diagonal: Vec<f64>,
    coupling: Vec<f64>,
    stresses: Vec<[Pair; 2]>,
}

fn dot(one: Pair, other: Pair) -> f64 {
    one[0] * other[0] + one[1] * other[1]
}

fn times(matrix: Matrix, vector: Pair) -> Pair {
    [dot(matrix[0], vector), dot(matrix[1], vector)]
}

fn tridiagonal(below: &[f64], diagonal: &mut [f64], above: &[f64], mut right: Vec<f64>) -> Vec<f64> {
    for row in 1..right.len() {
        let factor = below[row - 1] / diagonal[row - 1];
        diagonal[row] -= factor * above[row - 1];
        right[row] -= factor * right[row - 1];
    }
    for row in (0..right.len()).rev() {
        if row + 1 < right.len() {
            right[row] -= above[row] * right[row + 1];
        }
        right[row] /= diagonal[row];
    }
    right
}
