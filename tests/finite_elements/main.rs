//! Hubs of finite length and stepped hubs against axisymmetric finite elements, worked here.
//!
//! The figures of `mechanics::finite_length` and the bands of `mechanics::slices` come from finite elements; these
//! here are four-node rectangles with four Gauss points, refined towards the edges, of one material, without friction.
//! Two meshes, the finer with half the widths, are extrapolated (Richardson). Textbook: O. C. Zienkiewicz,
//! *The Finite Element Method*, chapter on axisymmetric stress analysis.

mod banded;
mod element;
mod joint;

use hubgrip::mechanics::finite_length::{ShaftEnds, length_factors};
use hubgrip::mechanics::slices::{SLICE_DEVIATION, TOTAL_DEVIATION};
use joint::{Contact, DIAMETER, Joint};

/// Overhang after which more makes no difference, diameters.
const FAR: f64 = 1.0;

/// A result on two meshes, extrapolated.
fn extrapolated<const N: usize>(on_mesh: impl Fn(usize) -> [f64; N]) -> [f64; N] {
    let (coarse, fine) = (on_mesh(4), on_mesh(8));
    std::array::from_fn(|k| (4.0 * fine[k] - coarse[k]) / 3.0)
}

/// Mean pressure, pressure of the last 0.02 d and pressure at mid-length of a plain hub over Lamé's.
fn plain_hub(slenderness: f64, diameter_ratio: f64, overhang: f64) -> [f64; 3] {
    let (half_length, outer) = (0.5 * slenderness * DIAMETER, DIAMETER / diameter_ratio);
    let band = half_length - 0.02 * DIAMETER;
    extrapolated(|refinement| {
        let joint = Joint {
            steps: vec![(half_length, outer)],
            half: true,
            overhang: overhang * DIAMETER,
            marks: vec![band],
            refinement,
        };
        let contact = joint.solve();
        [
            contact.mean_over_lame(0.0, half_length, outer),
            contact.mean_over_lame(band, half_length, outer),
            contact.mean_over_lame(0.0, 0.02 * half_length, outer),
        ]
    })
}

/// Mean pressure of both steps, each over its own Lamé pressure, and their force over the sum of Lamé's.
fn stepped_hub(steps: [(f64, f64); 2], half: bool, overhang: f64) -> [f64; 3] {
    let lame = steps.map(|(length, outer)| length * (1.0 - (DIAMETER / outer).powi(2)));
    let [(first, first_outer), (second, second_outer)] = steps;
    extrapolated(|refinement| {
        let overhang = overhang * DIAMETER;
        let joint = Joint { steps: steps.to_vec(), half, overhang, marks: Vec::new(), refinement };
        let contact: Contact = joint.solve();
        let means = [
            contact.mean_over_lame(0.0, first, first_outer),
            contact.mean_over_lame(first, first + second, second_outer),
        ];
        let total = (means[0] * lame[0] + means[1] * lame[1]) / (lame[0] + lame[1]);
        [means[0], means[1], total]
    })
}

fn assert_table_holds(slenderness: f64, diameter_ratio: f64) {
    let [mean, edge, middle] = plain_hub(slenderness, diameter_ratio, FAR);
    let table = length_factors(slenderness, diameter_ratio, ShaftEnds::Through).unwrap();
    // The table is rounded to 0.001 and 0.01.
    assert!((mean - table.mean_pressure).abs() < 1e-3, "{mean}, table {}", table.mean_pressure);
    assert!((edge - table.edge_pressure).abs() < 1e-2, "{edge}, table {}", table.edge_pressure);
    if slenderness <= 0.5 {
        assert!((0.91..0.962).contains(&middle), "{middle}");
    }
}

#[test]
fn a_flush_shaft_has_the_pressure_of_the_thick_walled_cylinder() {
    for factor in plain_hub(0.5, 0.5, 0.0) {
        assert!((factor - 1.0).abs() < 2e-4, "{factor}");
    }
}

#[test]
fn factors_of_short_hubs() {
    assert_table_holds(0.25, 0.3);
    assert_table_holds(0.25, 0.5);
    assert_table_holds(0.25, 0.7);
}

#[test]
fn factors_of_hubs_of_half_a_diameter() {
    assert_table_holds(0.5, 0.3);
    assert_table_holds(0.5, 0.5);
    assert_table_holds(0.5, 0.7);
}

#[test]
fn factors_of_hubs_of_one_diameter() {
    assert_table_holds(1.0, 0.3);
    assert_table_holds(1.0, 0.5);
    assert_table_holds(1.0, 0.7);
}

#[test]
fn factors_of_long_hubs() {
    assert_table_holds(2.0, 0.3);
    assert_table_holds(2.0, 0.5);
    assert_table_holds(2.0, 0.7);
}

#[test]
fn a_short_overhang_has_most_of_the_effect() {
    for (slenderness, diameter_ratio) in [(0.25, 0.5), (1.0, 0.5)] {
        let [near, ..] = plain_hub(slenderness, diameter_ratio, 0.05);
        let [far, ..] = plain_hub(slenderness, diameter_ratio, FAR);
        let share = (near - 1.0) / (far - 1.0);
        assert!((0.61..0.64).contains(&share), "{share}");
    }
}

#[test]
fn stepped_hubs_stay_within_the_stated_bands() {
    let hubs = [
        ([(0.020, 0.070), (0.030, 0.100)], false, FAR),
        ([(0.020, 0.070), (0.030, 0.100)], false, 0.0),
        // Half of 15 mm of 70, 20 mm of 110, 15 mm of 70 mm.
        ([(0.010, 0.110), (0.015, 0.070)], true, FAR),
    ];
    for (steps, half, overhang) in hubs {
        let [first, second, total] = stepped_hub(steps, half, overhang);
        for slice in [first, second] {
            let deviation = slice - 1.0;
            assert!(
                deviation > SLICE_DEVIATION.0 - 1e-3 && deviation < SLICE_DEVIATION.1 + 1e-3,
                "{deviation}"
            );
        }
        assert!(total - 1.0 > TOTAL_DEVIATION.0 - 1e-3 && total - 1.0 < TOTAL_DEVIATION.1 + 1e-3, "{total}");
    }
}
