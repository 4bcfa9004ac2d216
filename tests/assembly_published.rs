//! Published worked examples of joining by heat and cold.

use approx::{assert_abs_diff_eq, assert_relative_eq};
use hubgrip::assembly::joining::{Joining, Obstacle};
use hubgrip::assembly::thermal::{
    LIQUID_NITROGEN_TEMPERATURE, hub_temperature_for, shaft_temperature_for, shrinkage,
};
use hubgrip::material::{Expansion, REFERENCE_TEMPERATURE};

/// Printed to three figures and more.
const PRINTED: f64 = 5e-4;

fn mean(coefficient: f64) -> Expansion {
    Expansion::from_mean(coefficient, 77.0, 900.0, "as printed in the example").unwrap()
}

/// Size at 20 °C of a part measured at `celsius`.
fn at_reference(size: f64, expansion: &Expansion, celsius: f64) -> f64 {
    size / (1.0 + expansion.strain(celsius + 273.15).unwrap())
}

#[test]
fn thin_tyre_on_a_wheel() {
    // Khurmi and Gupta, A Textbook of Machine Design, example 4.13: wheel 1200 mm, hoop stress 100 N/mm², E
    // 200 kN/mm², 6.5e-6 (a figure per °F, printed per °C): inner diameter 1199.4 mm, temperature rise 76.9 K.
    let bore = 1.2 / (1.0 + 100e6 / 200e9);
    assert_relative_eq!(bore, 1.1994, max_relative = PRINTED);
    let expansion = mean(6.5e-6);
    let shop = REFERENCE_TEMPERATURE;
    let hub = hub_temperature_for(bore, 1.2 - bore, 0.0, &expansion, &expansion, shop).unwrap();
    assert_relative_eq!(hub - shop, 76.9, max_relative = PRINTED);
}

#[test]
fn iron_ring_on_a_cart_wheel() {
    // NCERT Physics, class XI, thermal expansion: ring 5.231 m, rim 5.243 m at 27 °C, 1.20e-5: 218 °C.
    let iron = mean(1.2e-5);
    let (ring, rim) = (at_reference(5.231, &iron, 27.0), at_reference(5.243, &iron, 27.0));
    let hub = hub_temperature_for(ring, rim - ring, 0.0, &iron, &iron, 300.15).unwrap();
    assert_abs_diff_eq!(hub - 273.15, 218.0, epsilon = 0.5);
}

#[test]
fn two_cylinders_with_the_diameter_of_the_interface() {
    // Bhavikatti, Mechanics of Structures, example 8.8.17: interface 400 mm, allowance 0.2 mm on the diameter,
    // 12e-6. Printed 66.67 K is 0.2 mm over 250 mm, a radius; the interface is 400 mm across: 41.67 K.
    let steel = mean(12e-6);
    let shop = REFERENCE_TEMPERATURE;
    let hub = hub_temperature_for(0.4, 0.2e-3, 0.0, &steel, &steel, shop).unwrap();
    assert_relative_eq!(hub - shop, 41.666_666_7, max_relative = 1e-9);
}

#[test]
fn jacket_of_a_given_hoop_stress() {
    // Junnarkar, Mechanics of Structures, example 12: hoop stresses 8318.2 and −3187.5 lb/in² at the interface,
    // E 30e6 lb/in², 6.2e-6 per °F: 61.86 °F.
    let relative = (8318.2 + 3187.5) / 30e6;
    let steel = mean(6.2e-6 * 1.8);
    let shop = REFERENCE_TEMPERATURE;
    let hub = hub_temperature_for(0.25, 0.25 * relative, 0.0, &steel, &steel, shop).unwrap();
    assert_relative_eq!((hub - shop) * 1.8, 61.86, max_relative = PRINTED);
}

#[test]
fn shaft_chilled_into_a_wheel() {
    // NCERT Physics, class XI, exercise 11.6 (recalled): shaft 8.70 cm, hole 8.69 cm at 27 °C, 1.20e-5: −69 °C.
    let steel = mean(1.2e-5);
    let (hole, shaft) = (at_reference(0.0869, &steel, 27.0), at_reference(0.0870, &steel, 27.0));
    let cold = shaft_temperature_for(hole, shaft - hole, 0.0, &steel, 300.15, &steel).unwrap();
    assert_abs_diff_eq!(cold - 273.15, -69.0, epsilon = 0.5);
}

#[test]
fn ring_on_a_disc() {
    // H. C. Verma, Concepts of Physics, chapter 23, worked example 9: 15.00 cm ring to 15.05 cm, 20 °C, 12e-6: 298 °C,
    // strain 3.33e-3 after cooling.
    let iron = mean(12e-6);
    let hub = hub_temperature_for(0.15, 0.5e-3, 0.0, &iron, &iron, REFERENCE_TEMPERATURE).unwrap();
    assert_abs_diff_eq!(hub - 273.15, 298.0, epsilon = 0.5);
    assert_relative_eq!(iron.strain(hub).unwrap(), 3.33e-3, max_relative = 2e-3);
}

#[test]
fn aluminium_ring_with_clearance() {
    // Florida State University, physics study guide, ring on a rod: rod 6.019 cm, ring 5.988 cm at 21 °C, 0.005 cm
    // clearance, 25e-6: rise 240.5 K, 262 °C (printed rounded up from 261.5). The example heats the ring alone from
    // 21 °C with its size there, so the sizes are taken at 20 °C and one kelvin is added.
    let aluminium = mean(25e-6);
    let shop = REFERENCE_TEMPERATURE;
    let hub = hub_temperature_for(0.05988, 0.06019 - 0.05988, 5e-5, &aluminium, &aluminium, shop).unwrap();
    assert_relative_eq!(hub - shop, 240.5, max_relative = PRINTED);
    assert_relative_eq!(hub - 273.15 + 1.0, 262.0, max_relative = 3e-3);
}

#[test]
fn a_temperature_that_steel_does_not_reach_is_refused() {
    // Cutnell and Johnson, Physics, chapter 12 (variant read on a question board): rod 2.0046 cm, hole 2.0000 cm, 12e-6:
    // drop 191.67 K, dividing by the hole; the rod gives 191.23 K. Ferritic steel has contracted by 0.18 to 0.20 % at
    // −196 °C, the parts need 0.23 %: they do not go together in liquid nitrogen.
    let shop = REFERENCE_TEMPERATURE;
    let room = mean(12e-6);
    let cold = shaft_temperature_for(0.02, 4.6e-5, 0.0, &room, shop, &room).unwrap();
    assert_relative_eq!(shop - cold, 191.226_845, max_relative = 1e-8);
    assert_relative_eq!(shop - cold, 191.67, max_relative = 3e-3);

    let ferritic = Expansion::from_mean(8.5e-6, 77.0, 293.15, "steel, undercooling, 20 to −196 °C").unwrap();
    let joining = Joining {
        diameter: 0.02,
        interference: 4.6e-5,
        clearance: 0.0,
        hub: &room,
        shaft: &ferritic,
        shop_temperature: shop,
        hub_limit: None,
    };
    let route = joining.chill_shaft().unwrap();
    assert_eq!(route.temperature, None);
    assert!(matches!(route.obstacle, Some(Obstacle::CurveEnds { end: 77.0, .. })));
    let bath = joining.bath(LIQUID_NITROGEN_TEMPERATURE).unwrap();
    assert!(!bath.alone && bath.shrinkage.unwrap() < bath.needed);
    // The rest comes from a warm hub: 20 °C and a few tens of kelvin.
    assert!((20.0..60.0).contains(&(bath.hub.unwrap().temperature.unwrap() - shop)));
}

#[test]
fn total_contraction_to_liquid_nitrogen() {
    // Karlsruhe Institute of Technology, cryogenic engineering courses: steel 0.3 %, aluminium 0.4 % (rounded). 0.3 % is
    // austenitic steel; the mean coefficient 8.5e-6 usual for ferritic steel gives 0.18 %, 18e-6 for aluminium 0.39 %.
    for (coefficient, contraction) in [(8.5e-6, 1.836e-3), (18e-6, 3.888e-3)] {
        let part = mean(coefficient);
        assert_relative_eq!(shrinkage(1.0, &part, 293.0, 77.0).unwrap(), contraction, max_relative = 1e-9);
    }
    assert_relative_eq!(shrinkage(1.0, &mean(18e-6), 293.0, 77.0).unwrap(), 0.004, max_relative = 0.03);
}
