//! The rectangular element of four nodes in axial symmetry.

/// Young's modulus, Pa.
pub const MODULUS: f64 = 200e9;
/// Poisson's ratio.
pub const POISSON: f64 = 0.3;
/// Place of the Gauss points, 1/√3.
const GAUSS: f64 = 0.577_350_269_189_625_8;
/// Corners in the unit square, counted round it.
const CORNERS: [(f64, f64); 4] = [(-1.0, -1.0), (1.0, -1.0), (1.0, 1.0), (-1.0, 1.0)];

pub type Stiffness = [[f64; 8]; 8];

/// Stiffness per radian of the element between two radii and two places along the axis.
///
/// Unknowns: radial and axial displacement of each corner in turn. Four Gauss points.
pub fn stiffness(radii: [f64; 2], places: [f64; 2]) -> Stiffness {
    let (half_width, half_height) = (0.5 * (radii[1] - radii[0]), 0.5 * (places[1] - places[0]));
    let mut stiffness = [[0.0; 8]; 8];
    for (s, t) in CORNERS.map(|(s, t)| (s * GAUSS, t * GAUSS)) {
        let radius = 0.5 * (radii[0] + radii[1]) + s * half_width;
        let strain = strains(s, t, radius, half_width, half_height);
        let stress = stresses(&strain);
        let weight = radius * half_width * half_height;
        for i in 0..8 {
            for j in 0..8 {
                stiffness[i][j] += weight * (0..4).map(|m| strain[m][i] * stress[m][j]).sum::<f64>();
            }
        }
    }
    stiffness
}

/// Radial, hoop, axial and shear strain by each unknown, at a point of the unit square.
fn strains(s: f64, t: f64, radius: f64, half_width: f64, half_height: f64) -> [[f64; 8]; 4] {
    let mut strain = [[0.0; 8]; 4];
    for (k, (sk, tk)) in CORNERS.into_iter().enumerate() {
        let by_radius = 0.25 * sk * (1.0 + t * tk) / half_width;
        let by_place = 0.25 * tk * (1.0 + s * sk) / half_height;
        strain[0][2 * k] = by_radius;
        strain[1][2 * k] = 0.25 * (1.0 + s * sk) * (1.0 + t * tk) / radius;
        strain[2][2 * k + 1] = by_place;
        strain[3][2 * k] = by_place;
        strain[3][2 * k + 1] = by_radius;
    }
    strain
}

/// Stresses of those strains, by Hooke's law.
fn stresses(strain: &[[f64; 8]; 4]) -> [[f64; 8]; 4] {
    let scale = MODULUS / ((1.0 + POISSON) * (1.0 - 2.0 * POISSON));
    let (direct, cross, shear) = (scale * (1.0 - POISSON), scale * POISSON, scale * (0.5 - POISSON));
    let mut stress = [[0.0; 8]; 4];
    for k in 0..8 {
        let sum = strain[0][k] + strain[1][k] + strain[2][k];
        for m in 0..3 {
            stress[m][k] = (direct - cross) * strain[m][k] + cross * sum;
        }
        stress[3][k] = shear * strain[3][k];
    }
    stress
}
