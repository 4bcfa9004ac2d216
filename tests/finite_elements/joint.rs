//! A hub on a solid shaft as a mesh of elements: the contact pressure along the seat.

use crate::banded::Banded;
use crate::element::{MODULUS, Stiffness, stiffness};

/// Joint diameter, m.
pub const DIAMETER: f64 = 0.05;
const SEAT: f64 = 0.5 * DIAMETER;
/// Radial interference, m.
const OVERLAP: f64 = 25e-6;

/// A hub of steps from z = 0 on, on a solid shaft.
pub struct Joint {
    /// Length and outer diameter of every step, m.
    pub steps: Vec<(f64, f64)>,
    /// Whether z = 0 is the middle of the joint; otherwise the shaft stands out there too.
    pub half: bool,
    /// How far the shaft stands out, m.
    pub overhang: f64,
    /// Further places along the axis where the mesh must have nodes.
    pub marks: Vec<f64>,
    /// Elements from one edge to the middle of a part.
    pub refinement: usize,
}

/// Contact pressure along the seat.
pub struct Contact {
    /// Place and radial contact force per radian of every node of the hub's seat.
    nodes: Vec<(f64, f64)>,
}

impl Joint {
    /// Solves for the contact: hub and shaft share the radial displacement of the seat but for the overlap, and slide
    /// freely along it.
    pub fn solve(&self) -> Contact {
        let mesh = Mesh::of(self);
        let per_station = 2 * mesh.radii.len();
        let size = per_station * mesh.stations.len();
        let mut matrix = Banded::new(size, per_station + 6);
        let mut right = vec![0.0; size];
        let elements = mesh.elements(self);
        for element in &elements {
            for i in 0..8 {
                for j in 0..8 {
                    matrix.add(element.unknowns[i], element.unknowns[j], element.stiffness[i][j]);
                    right[element.unknowns[i]] -= element.stiffness[i][j] * element.overlap[j];
                }
            }
        }
        self.support(&mesh, &mut matrix, &mut right);
        matrix.fix_unused(&mut right);
        let solution = matrix.solve(right);
        let mut forces = vec![0.0; mesh.stations.len()];
        for element in elements.iter().filter(|element| element.at_seat) {
            for (corner, station) in [(0, element.station), (3, element.station + 1)] {
                forces[station] += (0..8)
                    .map(|j| {
                        element.stiffness[2 * corner][j]
                            * (solution[element.unknowns[j]] + element.overlap[j])
                    })
                    .sum::<f64>();
            }
        }
        let length = self.length();
        let nodes = mesh.stations.into_iter().zip(forces);
        Contact { nodes: nodes.filter(|(place, _)| *place >= -1e-12 && *place <= length + 1e-12).collect() }
    }

    /// Length of the hub from z = 0.
    pub fn length(&self) -> f64 {
        self.steps.iter().map(|(length, _)| length).sum()
    }

    fn support(&self, mesh: &Mesh, matrix: &mut Banded, right: &mut [f64]) {
        if self.half {
            (0..mesh.radii.len()).for_each(|row| matrix.fix(mesh.unknown(0, row, true), right));
        } else {
            let first_of_hub = mesh.stations.iter().position(|place| *place >= -1e-12).unwrap();
            matrix.fix(mesh.unknown(0, 0, true), right);
            matrix.fix(mesh.unknown(first_of_hub, mesh.shaft_rows, true), right);
        }
        (0..mesh.stations.len()).for_each(|station| matrix.fix(mesh.unknown(station, 0, false), right));
    }

    /// Outer radius of the hub at a place; zero beyond it.
    fn outer_radius(&self, place: f64) -> f64 {
        let mut end = 0.0;
        for (length, outer_diameter) in &self.steps {
            end += length;
            if place > 0.0 && place < end {
                return 0.5 * outer_diameter;
            }
        }
        0.0
    }
}

impl Contact {
    /// Mean contact pressure between two nodes over that of a thick-walled cylinder of this outer diameter.
    ///
    /// The force of a node at an end of the range is shared by the lengths of its two neighbouring elements.
    pub fn mean_over_lame(&self, from: f64, to: f64, outer_diameter: f64) -> f64 {
        let place = |k: usize| self.nodes[k.min(self.nodes.len() - 1)].0;
        let force: f64 = (0..self.nodes.len())
            .map(|k| {
                let before = 0.5 * (place(k.saturating_sub(1)) + place(k));
                let after = 0.5 * (place(k) + place(k + 1));
                let inside = (after.min(to) - before.max(from)).max(0.0);
                self.nodes[k].1 * inside / (after - before)
            })
            .sum();
        let ratio = DIAMETER / outer_diameter;
        let lame = MODULUS * OVERLAP / DIAMETER * (1.0 - ratio * ratio);
        force / (SEAT * (to - from)) / lame
    }
}

/// Nodes: the same radii at every station along the axis, the seat twice.
struct Mesh {
    radii: Vec<f64>,
    /// Nodes of the shaft at a station, the seat included.
    shaft_rows: usize,
    stations: Vec<f64>,
}

struct Element {
    station: usize,
    at_seat: bool,
    unknowns: [usize; 8],
    overlap: [f64; 8],
    stiffness: Stiffness,
}

impl Mesh {
    fn of(joint: &Joint) -> Self {
        let n = joint.refinement;
        let shaft = graded(0.0, SEAT, 2 * n, 0.02);
        let mut outer: Vec<f64> = joint.steps.iter().map(|(_, diameter)| 0.5 * diameter).collect();
        outer.sort_by(f64::total_cmp);
        outer.dedup();
        let mut hub = reversed(graded(outer[0], SEAT, 2 * n, 0.02));
        for pair in outer.windows(2) {
            hub = joined(hub, dense_at_both_ends(pair[0], pair[1], n));
        }
        let shaft_rows = shaft.len();
        Self { radii: shaft.into_iter().chain(hub).collect(), shaft_rows, stations: stations(joint) }
    }

    /// Number of the unknown of a node; hub and shaft share the radial one at the seat.
    fn unknown(&self, station: usize, row: usize, axial: bool) -> usize {
        let row = if row == self.shaft_rows && !axial { row - 1 } else { row };
        2 * (station * self.radii.len() + row) + usize::from(axial)
    }

    fn elements(&self, joint: &Joint) -> Vec<Element> {
        let mut elements = Vec::new();
        for station in 0..self.stations.len() - 1 {
            let places = [self.stations[station], self.stations[station + 1]];
            let outer = joint.outer_radius(0.5 * (places[0] + places[1]));
            for row in (0..self.radii.len() - 1).filter(|row| row + 1 != self.shaft_rows) {
                let radii = [self.radii[row], self.radii[row + 1]];
                let in_hub = row >= self.shaft_rows;
                if in_hub && radii[1] > outer + 1e-12 {
                    continue;
                }
                let nodes = [(station, row), (station, row + 1), (station + 1, row + 1), (station + 1, row)];
                elements.push(Element {
                    station,
                    at_seat: row == self.shaft_rows,
                    unknowns: std::array::from_fn(|k| {
                        let (station, row) = nodes[k / 2];
                        self.unknown(station, row, k % 2 == 1)
                    }),
                    overlap: std::array::from_fn(|k| {
                        if nodes[k / 2].1 == self.shaft_rows && k % 2 == 0 { OVERLAP } else { 0.0 }
                    }),
                    stiffness: stiffness(radii, places),
                });
            }
        }
        elements
    }
}

/// Places along the axis: dense at every step and edge.
fn stations(joint: &Joint) -> Vec<f64> {
    let n = joint.refinement;
    let mut breaks = vec![0.0];
    for (length, _) in &joint.steps {
        breaks.push(breaks[breaks.len() - 1] + length);
    }
    breaks.extend(&joint.marks);
    breaks.sort_by(f64::total_cmp);
    let starts_at_hub = joint.half || joint.overhang == 0.0;
    let mut stations = if starts_at_hub { vec![0.0] } else { graded(-joint.overhang, 0.0, 2 * n, 0.005) };
    for pair in breaks.windows(2) {
        stations = joined(stations, dense_at_both_ends(pair[0], pair[1], n));
    }
    if joint.overhang > 0.0 {
        let end = joint.length();
        stations = joined(stations, reversed(graded(end + joint.overhang, end, 2 * n, 0.005)));
    }
    stations
}

/// Points from one place to another, dense at the second: the widths fall in a fixed ratio to `last_over_first`.
fn graded(from: f64, to: f64, count: usize, last_over_first: f64) -> Vec<f64> {
    let ratio = last_over_first.powf(1.0 / (count - 1) as f64);
    let widths: Vec<f64> = (0..count).map(|k| ratio.powi(k as i32)).collect();
    let total: f64 = widths.iter().sum();
    let mut points = vec![from];
    let mut sum = 0.0;
    for width in widths {
        sum += width;
        points.push(from + (to - from) * sum / total);
    }
    points[count] = to;
    points
}

fn dense_at_both_ends(from: f64, to: f64, count: usize) -> Vec<f64> {
    let middle = 0.5 * (from + to);
    joined(reversed(graded(middle, from, count, 0.1)), graded(middle, to, count, 0.1))
}

fn joined(mut first: Vec<f64>, second: Vec<f64>) -> Vec<f64> {
    first.extend(second.into_iter().skip(1));
    first
}

fn reversed(mut points: Vec<f64>) -> Vec<f64> {
    points.reverse();
    points
}
