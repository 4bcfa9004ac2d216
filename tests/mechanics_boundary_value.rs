//! Rings and stacks against a numerical solution of the boundary-value problem, and against themselves.
//!
//! The numerical solution shares no formula with the program: the equilibrium equation in the displacement,
//! u″ + u′/r − u/r² = (1 + ν) ε′ − (1 − ν²) ρ ω² r/E (plane stress), is solved by central differences on two grids
//! with Richardson extrapolation, and the contact pressures follow from a dense system of its face displacements.

use approx::assert_relative_eq;
use hubgrip::mechanics::ring::{RingLoad, RingSection};
use hubgrip::mechanics::rotation;
use hubgrip::mechanics::stack::{Stack, StackSolution};
use hubgrip::numerics::root::bracketed;
use nalgebra::{DMatrix, DVector};
use proptest::prelude::*;

/// Intervals of the coarse grid.
const INTERVALS: usize = 400;

/// Displacement of a ring at inner face, middle and outer face, m.
fn numerical_displacements(ring: &RingSection, load: &RingLoad) -> [f64; 3] {
    let (coarse, fine) = (on_grid(ring, load, INTERVALS), on_grid(ring, load, 2 * INTERVALS));
    [0, 1, 2].map(|place| {
        let (coarse, fine) = (coarse[place * INTERVALS / 2], fine[place * INTERVALS]);
        (4.0 * fine - coarse) / 3.0
    })
}

/// Displacements at the nodes of a grid, by central differences; the faces carry their pressures over ghost nodes.
fn on_grid(ring: &RingSection, load: &RingLoad, intervals: usize) -> Vec<f64> {
    let (a, b) = (ring.inner_radius(), ring.outer_radius());
    let (modulus, poisson) = (ring.youngs_modulus(), ring.poisson());
    let step = (b - a) / intervals as f64;
    let plane = 1.0 - poisson * poisson;
    let strain_slope = |r: f64| if a > 0.0 { load.strain_rise / ((b / a).ln() * r) } else { 0.0 };
    let right_side = |r: f64| {
        (1.0 + poisson) * strain_slope(r) - plane * ring.density() * load.angular_speed.powi(2) * r / modulus
    };
    // u′ at a face = constant + factor · u from σr = −p.
    let face = |r: f64, pressure: f64, strain: f64| {
        (-plane * pressure / modulus + (1.0 + poisson) * strain, -poisson / r)
    };
    let count = intervals + 1;
    let (mut lower, mut diagonal, mut upper, mut right) =
        (vec![0.0; count], vec![0.0; count], vec![0.0; count], vec![0.0; count]);
    for node in 0..count {
        let r = a + step * node as f64;
        if r == 0.0 {
            diagonal[node] = 1.0;
            continue;
        }
        let (before, after) =
            (1.0 / (step * step) - 0.5 / (step * r), 1.0 / (step * step) + 0.5 / (step * r));
        diagonal[node] = -2.0 / (step * step) - 1.0 / (r * r);
        right[node] = right_side(r);
        lower[node] = before;
        upper[node] = after;
        if node == 0 {
            let (constant, factor) = face(r, load.inner_pressure, load.free_strain);
            upper[node] = after + before;
            diagonal[node] -= before * 2.0 * step * factor;
            right[node] += before * 2.0 * step * constant;
        }
        if node == intervals {
            let (constant, factor) = face(r, load.outer_pressure, load.free_strain + load.strain_rise);
            lower[node] = before + after;
            diagonal[node] += after * 2.0 * step * factor;
            right[node] -= after * 2.0 * step * constant;
        }
    }
    for node in 1..count {
        let factor = lower[node] / diagonal[node - 1];
        diagonal[node] -= factor * upper[node - 1];
        right[node] -= factor * right[node - 1];
    }
    let mut displacement = vec![0.0; count];
    for node in (0..count).rev() {
        let next = if node < intervals { upper[node] * displacement[node + 1] } else { 0.0 };
        displacement[node] = (right[node] - next) / diagonal[node];
    }
    displacement
}

/// Contact pressures of a stack with these interfaces closed, from the numerical displacements alone.
fn numerical_pressures(stack: &Stack, closed: &[bool]) -> Vec<f64> {
    let count = closed.len();
    let gaps = |pressures: &[f64]| {
        let loads = loads(stack, pressures);
        let faces: Vec<[f64; 3]> =
            stack.rings.iter().zip(&loads).map(|(ring, load)| numerical_displacements(ring, load)).collect();
        DVector::from_fn(count, |k, _| faces[k + 1][0] - faces[k][2] - 0.5 * stack.interference[k])
    };
    let free = gaps(&vec![0.0; count]);
    let mut matrix = DMatrix::identity(count, count);
    let mut right = DVector::zeros(count);
    let unit = 100e6;
    let columns: Vec<DVector<f64>> = (0..count)
        .map(|j| {
            let mut pressures = vec![0.0; count];
            pressures[j] = unit;
            (gaps(&pressures) - &free) / unit
        })
        .collect();
    for k in (0..count).filter(|k| closed[*k]) {
        (0..count).for_each(|j| matrix[(k, j)] = columns[j][k] * 1e12);
        right[k] = -free[k] * 1e12;
    }
    matrix.lu().solve(&right).unwrap().iter().copied().collect()
}

/// What acts on each ring of a stack under these contact pressures.
fn loads(stack: &Stack, pressures: &[f64]) -> Vec<RingLoad> {
    let solution = StackSolution { pressures: pressures.to_vec(), gaps: vec![], open: vec![] };
    (0..stack.rings.len()).map(|index| stack.ring_load(index, &solution).unwrap()).collect()
}

/// A turning stack of three materials, filled with pressure, warm inside, with heat flowing outwards.
fn three_materials() -> Stack {
    Stack {
        rings: vec![
            RingSection::new(0.020, 0.030, 210e9, 0.30, 7850.0).unwrap(),
            RingSection::new(0.030, 0.042, 110e9, 0.34, 8800.0).unwrap(),
            RingSection::new(0.042, 0.080, 70e9, 0.33, 2700.0).unwrap(),
        ],
        interference: vec![40e-6, 70e-6],
        free_strain: vec![8e-4, 9e-4, 7e-4],
        strain_rise: vec![-1e-4, -2e-4, -3e-4],
        inner_pressure: 30e6,
        outer_pressure: 5e6,
        angular_speed: 800.0,
    }
}

#[test]
fn a_ring_under_everything_at_once() {
    let stack = three_materials();
    let load = RingLoad {
        inner_pressure: 80e6,
        outer_pressure: 20e6,
        angular_speed: 2000.0,
        free_strain: 5e-4,
        strain_rise: -8e-4,
    };
    for ring in &stack.rings {
        let (a, b) = (ring.inner_radius(), ring.outer_radius());
        let numerical = numerical_displacements(ring, &load);
        for (radius, numerical) in [a, 0.5 * (a + b), b].into_iter().zip(numerical) {
            assert_relative_eq!(ring.displacement_at(&load, radius).unwrap(), numerical, max_relative = 1e-8);
        }
        for (radius, numerical, pressure, strain) in
            [(a, numerical[0], 80e6, 5e-4), (b, numerical[2], 20e6, -3e-4)]
        {
            let hoop = -ring.poisson() * pressure + ring.youngs_modulus() * (numerical / radius - strain);
            assert_relative_eq!(ring.stress_at(&load, radius).unwrap().hoop, hoop, max_relative = 1e-7);
        }
    }
    let solid = RingSection::new(0.0, 0.03, 210e9, 0.3, 7850.0).unwrap();
    let load =
        RingLoad { outer_pressure: 20e6, angular_speed: 2000.0, free_strain: 5e-4, ..RingLoad::default() };
    let numerical = numerical_displacements(&solid, &load);
    assert_eq!(numerical[0], 0.0);
    for (radius, numerical) in [(0.015, numerical[1]), (0.03, numerical[2])] {
        assert_relative_eq!(solid.displacement_at(&load, radius).unwrap(), numerical, max_relative = 1e-8);
    }
}

#[test]
fn a_stack_of_three_materials_under_everything_at_once() {
    let stack = three_materials();
    let solution = stack.solve().unwrap();
    assert_eq!(solution.open, [false, false]);
    let numerical = numerical_pressures(&stack, &[true, true]);
    for (ours, numerical) in solution.pressures.iter().zip(&numerical) {
        assert_relative_eq!(ours, numerical, max_relative = 1e-7);
    }
}

#[test]
fn a_stack_with_an_interface_that_opens() {
    let stack = Stack { interference: vec![60e-6, -200e-6], ..three_materials() };
    let solution = stack.solve().unwrap();
    assert_eq!(solution.open, [false, true]);
    let numerical = numerical_pressures(&stack, &[true, false]);
    assert_relative_eq!(solution.pressures[0], numerical[0], max_relative = 1e-7);
    let loads = loads(&stack, &numerical);
    let bore = numerical_displacements(&stack.rings[2], &loads[2])[0];
    let rim = numerical_displacements(&stack.rings[1], &loads[1])[2];
    assert_relative_eq!(solution.gaps[1], bore - rim + 100e-6, max_relative = 1e-7);
    // Closing it by force would need a pull.
    assert!(numerical_pressures(&stack, &[true, true])[1] < 0.0);
}

/// Modulus (Pa), Poisson's ratio, density (kg/m³).
type Material = (f64, f64, f64);

fn material() -> impl Strategy<Value = Material> {
    (50e9..400e9, 0.0..0.45, 1000.0..9000.0)
}

/// Rings of these materials from a solid or hollow core outwards, at rest and cold.
fn stack(first: f64, solid: bool, layers: &[(f64, Material, f64)]) -> Stack {
    let mut radius = if solid { 0.0 } else { first };
    let mut stack = Stack::default();
    for (index, (ratio, (modulus, poisson, density), share)) in layers.iter().enumerate() {
        let outer = if radius == 0.0 { first } else { radius * ratio };
        if index > 0 {
            stack.interference.push(2.0 * share * radius);
        }
        stack.rings.push(RingSection::new(radius, outer, *modulus, *poisson, *density).unwrap());
        stack.free_strain.push(0.0);
        radius = outer;
    }
    stack
}

/// A stack of several materials, its interferences positive.
fn gripping_stack() -> impl Strategy<Value = Stack> {
    let layers = proptest::collection::vec((1.1..1.8, material(), 1e-4..1e-3), 2..=6);
    (0.01..0.1, any::<bool>(), layers).prop_map(|(first, solid, layers)| stack(first, solid, &layers))
}

/// A stack of one material, its interferences positive.
fn gripping_stack_of_one_material() -> impl Strategy<Value = Stack> {
    let layers = proptest::collection::vec((1.1..1.8, 1e-4..1e-3), 2..=6);
    (0.01..0.1, any::<bool>(), material(), layers).prop_map(|(first, solid, material, layers)| {
        let layers: Vec<_> = layers.into_iter().map(|(ratio, share)| (ratio, material, share)).collect();
        stack(first, solid, &layers)
    })
}

/// Pressure of an interface where it is closed, less its gap in the same unit where it is open.
fn grip(stack: &Stack, interface: usize, speed: f64) -> f64 {
    let turning = Stack { angular_speed: speed, ..stack.clone() };
    let solution = turning.solve().unwrap();
    solution.pressures[interface]
        - solution.gaps[interface] / turning.influence().unwrap().diagonal[interface]
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(32))]

    #[test]
    fn any_stack_is_the_numerical_one(
        stack in gripping_stack(),
        speed in 0.0..500.0,
        strains in proptest::collection::vec((-3e-4..3e-4, -3e-4..3e-4), 6),
    ) {
        let mut loaded = Stack { angular_speed: speed, outer_pressure: 10e6, ..stack };
        for (index, (strain, rise)) in strains.iter().take(loaded.rings.len()).enumerate() {
            loaded.free_strain[index] = *strain;
            loaded.strain_rise.push(if loaded.rings[index].is_solid() { 0.0 } else { *rise });
        }
        let solution = loaded.solve().unwrap();
        let closed: Vec<bool> = solution.open.iter().map(|open| !open).collect();
        let numerical = numerical_pressures(&loaded, &closed);
        let greatest = solution.pressures.iter().fold(1e6_f64, |greatest, pressure| greatest.max(*pressure));
        for (ours, numerical) in solution.pressures.iter().zip(&numerical) {
            prop_assert!((ours - numerical).abs() < 1e-6 * greatest, "{ours} {numerical}");
        }
    }
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(256))]

    /// With every interface closed the pressures by interference, speed, temperature and pressure outside add up.
    #[test]
    fn causes_superpose(stack in gripping_stack(), speed in 1.0..100.0, strain in -1e-5..1e-5, outside in 1e6..50e6) {
        let count = stack.interference.len();
        let bare = Stack { interference: vec![0.0; count], ..stack.clone() };
        let mut warm = bare.clone();
        warm.free_strain[0] = strain;
        let turning = Stack { angular_speed: speed, ..bare.clone() };
        let pressed = Stack { outer_pressure: outside, ..bare };
        let together = Stack { angular_speed: speed, outer_pressure: outside, free_strain: warm.free_strain.clone(), ..stack.clone() };
        let solution = together.solve().unwrap();
        prop_assume!(solution.open.iter().all(|open| !open));
        // A single cause may open an interface, so the parts come from the linear system with all closed.
        let linear = |stack: &Stack| {
            let influence = stack.influence().unwrap();
            let matrix = DMatrix::from_fn(count, count, |row, column| match column as isize - row as isize {
                0 => influence.diagonal[row],
                -1 => influence.lower[row],
                1 => influence.upper[row],
                _ => 0.0,
            });
            matrix.lu().solve(&-&influence.free_gaps).unwrap()
        };
        let sum = linear(&stack) + linear(&warm) + linear(&turning) + linear(&pressed);
        for (together, sum) in solution.pressures.iter().zip(&sum) {
            prop_assert!((together - sum).abs() < 1e-9 * sum.abs().max(1e6));
        }
    }

    /// One material: rotation acts as on a single body, whose radial tension comes off the pressure at rest.
    #[test]
    fn speed_takes_the_tension_of_a_single_body_off_the_pressure(
        stack in gripping_stack_of_one_material(),
        speed in 1.0..200.0,
    ) {
        let (first, last) = (stack.rings[0], stack.rings[stack.rings.len() - 1]);
        let whole = RingSection::new(
            first.inner_radius(),
            last.outer_radius(),
            first.youngs_modulus(),
            first.poisson(),
            first.density(),
        )
        .unwrap();
        let at_rest = stack.solve().unwrap();
        let turning = Stack { angular_speed: speed, ..stack.clone() }.solve().unwrap();
        prop_assume!(turning.open.iter().all(|open| !open));
        let load = RingLoad { angular_speed: speed, ..RingLoad::default() };
        for (k, ring) in stack.rings.iter().take(at_rest.pressures.len()).enumerate() {
            let tension = whole.stress_at(&load, ring.outer_radius()).unwrap().radial;
            prop_assert!(tension > 0.0);
            let expected = at_rest.pressures[k] - tension;
            prop_assert!((turning.pressures[k] - expected).abs() < 1e-8 * at_rest.pressures[k].max(1e6));
        }
    }

    /// One material: the pressures never rise with the speed, opened interfaces included.
    #[test]
    fn pressures_fall_with_the_speed(stack in gripping_stack_of_one_material(), slow in 0.0..3000.0, more in 1.0..3000.0) {
        let pressures = |speed: f64| Stack { angular_speed: speed, ..stack.clone() }.solve().unwrap().pressures;
        for (slow, fast) in pressures(slow).into_iter().zip(pressures(slow + more)) {
            prop_assert!(fast <= slow * (1.0 + 1e-9) + 1.0, "{slow} {fast}");
        }
    }

    /// The speed at which an interface opens, by following the path and by a root of the complementary solution.
    #[test]
    fn loosening_speeds_are_roots_of_the_complementary_solution(stack in gripping_stack(), share in 0.0..0.999) {
        let speeds = stack.loosening_speeds().unwrap();
        for (k, speed) in speeds.into_iter().enumerate() {
            match speed {
                None => {
                    for speed in [100.0, 1e3, 1e4, 1e5] {
                        prop_assert!(grip(&stack, k, speed) >= 0.0, "interface {k} is open at {speed}");
                    }
                }
                Some(0.0) => prop_assert!(grip(&stack, k, 0.0) <= 0.0),
                Some(speed) => {
                    prop_assert!(grip(&stack, k, share * speed) > 0.0, "interface {k} opens before {speed}");
                    let signed = |speed: f64| grip(&stack, k, speed);
                    let root = bracketed(signed, 0.999 * speed, 1.001 * speed, 0.0).unwrap();
                    prop_assert!((root - speed).abs() < 1e-7 * speed, "{root} {speed}");
                }
            }
        }
    }

    /// Two rings: the closed form is the path.
    #[test]
    fn the_closed_form_of_two_rings_is_the_path(
        first in 0.01..0.1, solid in any::<bool>(), inner in material(), outer in material(), ratio in 1.1..4.0,
    ) {
        let stack = stack(first, solid, &[(1.5, inner, 0.0), (ratio, outer, 1e-3)]);
        let by_path = stack.loosening_speeds().unwrap()[0];
        let closed = rotation::loosening_speed(&stack.rings[0], &stack.rings[1], stack.interference[0]).unwrap();
        match (by_path, closed) {
            (Some(by_path), Some(closed)) => prop_assert!((by_path - closed).abs() < 1e-9 * closed),
            (by_path, closed) => prop_assert_eq!(by_path, closed),
        }
    }
}
