//! Published worked examples of speed, of temperature in service and of the notch at the edge, number by number.
//!
//! Ours must round to the printed digits. Where a published answer is wrong, or rests on another assumption, the test
//! says so and asserts our value against a second route.

mod printed;

use std::f64::consts::PI;

use hubgrip::mechanics::ring::{RingLoad, RingSection, Stress};
use hubgrip::mechanics::rotation::loosening_speed;
use hubgrip::mechanics::stack::Stack;
use hubgrip::mechanics::{notch, temperature};
use printed::{MPA, PSI, assert_close, assert_prints};

/// Revolutions per minute, rad/s.
const RPM: f64 = 2.0 * PI / 60.0;

/// A stack of two rings and the stress at a face of one.
struct Pair(Stack);

impl Pair {
    fn new(inside: RingSection, outside: RingSection, interference: f64) -> Self {
        Self(Stack {
            rings: vec![inside, outside],
            interference: vec![interference],
            free_strain: vec![0.0; 2],
            ..Stack::default()
        })
    }

    fn warmed(mut self, inside: f64, outside: f64) -> Self {
        self.0.free_strain = vec![inside, outside];
        self
    }

    fn turning(mut self, speed: f64) -> Self {
        self.0.angular_speed = speed;
        self
    }

    fn pressure(&self) -> f64 {
        self.0.solve().unwrap().pressures[0]
    }

    fn stress(&self, ring: usize, radius: f64) -> Stress {
        let load = self.0.ring_load(ring, &self.0.solve().unwrap()).unwrap();
        self.0.rings[ring].stress_at(&load, radius).unwrap()
    }
}

#[test]
fn allowance_of_a_disc_that_just_loosens() {
    // Ugural & Fenster, Advanced Strength and Applied Elasticity, example 8.4: disc 0.1/0.5 m on a solid shaft,
    // 7800 kg/m³, 200 GPa, 0.3, 6900 rpm. The radial allowance is also printed as 0.0526 mm in the example.
    let shaft = RingSection::new(0.0, 0.05, 200e9, 0.3, 7800.0).unwrap();
    let disc = RingSection::new(0.05, 0.25, 200e9, 0.3, 7800.0).unwrap();
    let speed = 6900.0 * RPM;
    // The loosening speed goes with the root of the interference.
    let trial = loosening_speed(&shaft, &disc, 1e-4).unwrap().unwrap();
    let interference = 1e-4 * (speed / trial).powi(2);
    assert_prints(0.5 * interference, "5.25", 1e-5);
    let at_rest = Pair::new(shaft, disc, interference);
    assert_prints(at_rest.pressure(), "100.8", MPA);
    assert_prints(at_rest.stress(1, 0.05).hoop, "109.2", MPA);
    let turning = at_rest.turning(speed * (1.0 - 1e-9));
    assert!(turning.pressure() < 1.0);
    assert_prints(turning.stress(1, 0.05).hoop, "211.8", MPA);
}

#[test]
fn thin_rim() {
    // Jindal, Machine Design, example 3-28: mean radius 1 m, 7800 kg/m³, 150 MPa.
    let rim = RingSection::new(1.0, 1.0 + 1e-7, 200e9, 0.3, 7800.0).unwrap();
    let unit = RingLoad { angular_speed: 1.0, ..RingLoad::default() };
    let speed = (150e6 / rim.stress_at(&unit, 1.0).unwrap().hoop).sqrt();
    assert_prints(speed, "1324.25", RPM);
}

#[test]
fn greatest_radial_stress_of_an_annular_disc() {
    // Jindal, Machine Design, example 3-29: radii 50 and 200 mm, 6000 rpm, 7800 kg/m³, ν = 0.28; at √(a b).
    let disc = RingSection::new(0.05, 0.2, 200e9, 0.28, 7800.0).unwrap();
    let load = RingLoad { angular_speed: 6000.0 * RPM, ..RingLoad::default() };
    let radial = |radius: f64| disc.stress_at(&load, radius).unwrap().radial;
    assert_prints(radial(0.1), "28.4", MPA);
    assert!(radial(0.099) < radial(0.1) && radial(0.101) < radial(0.1));
}

#[test]
fn disc_whose_published_bore_stress_is_that_of_the_shaft() {
    // Tutoring-site solution (in the manner of Hearn): disc 750 mm outside, shaft 80 mm, diametral interference
    // 0.05 mm, 207 GPa, 7470 kg/m³. 63.9 MPa is printed, cut off from 63.95.
    let shaft = RingSection::new(0.0, 0.04, 207e9, 0.3, 7470.0).unwrap();
    let disc = RingSection::new(0.04, 0.375, 207e9, 0.3, 7470.0).unwrap();
    let joint = Pair::new(shaft, disc, 5e-5);
    assert_prints(joint.pressure(), "63.9515", MPA);
    // PUBLISHED WRONG: −63.9 MPa for the hoop stress at the bore of the disc is that of the shaft; the bore is in
    // tension, p (1 + Q²)/(1 − Q²).
    assert_prints(joint.stress(0, 0.04).hoop, "-63.9515", MPA);
    let ratio = (80.0_f64 / 750.0).powi(2);
    assert_close(joint.stress(1, 0.04).hoop, joint.pressure() * (1.0 + ratio) / (1.0 - ratio), 1e-12);
    assert_prints(joint.stress(1, 0.04).hoop, "65.4235", MPA);
    // No speed is printed; ours by ω = √(2 E δ/((3 + ν) ρ a b²)), Timoshenko & Goodier, § 32.
    let speed = loosening_speed(&shaft, &disc, 5e-5).unwrap().unwrap();
    assert_close(speed, (2.0 * 207e9 * 5e-5 / (3.3 * 7470.0 * 0.04 * 0.375_f64.powi(2))).sqrt(), 1e-12);
    assert_prints(speed, "386.372883", 1.0);
}

/// Two rings that fit exactly when cold, warmed; wall thicknesses may be scaled towards the thin ring.
struct WarmedRings {
    radius: f64,
    outer_wall: f64,
    inner_wall: f64,
    outer: (f64, f64),
    inner: (f64, f64),
    rise: f64,
}

impl WarmedRings {
    /// Hoop stress of the outer ring at its bore, and contact pressure, with both walls scaled.
    fn solve(&self, scale: f64) -> (f64, f64) {
        let (outer_modulus, outer_expansion) = self.outer;
        let (inner_modulus, inner_expansion) = self.inner;
        let inner_radius = self.radius - scale * self.inner_wall;
        let outer_radius = self.radius + scale * self.outer_wall;
        let inside = RingSection::new(inner_radius, self.radius, inner_modulus, 0.3, 0.0).unwrap();
        let outside = RingSection::new(self.radius, outer_radius, outer_modulus, 0.3, 0.0).unwrap();
        let pair =
            Pair::new(inside, outside, 0.0).warmed(inner_expansion * self.rise, outer_expansion * self.rise);
        (pair.stress(1, self.radius).hoop, pair.pressure())
    }
}

#[test]
fn brass_ring_inside_a_steel_ring_warmed() {
    // Beer & Johnston, Mechanics of Materials, 5th ed., solutions manual, problem 7.124: radius 80 mm, both walls
    // 4 mm, 210 and 105 GPa, 12e-6 and 20e-6 /K, 50 K warmer.
    let rings = WarmedRings {
        radius: 0.08,
        outer_wall: 0.004,
        inner_wall: 0.004,
        outer: (210e9, 12e-6),
        inner: (105e9, 20e-6),
        rise: 50.0,
    };
    // DIFFERS BY ASSUMPTION: the book takes thin rings. With walls a hundred-thousandth of those, ours is the same.
    let (hoop, pressure) = rings.solve(1e-5);
    assert_prints(hoop, "28.0", MPA);
    assert_prints(pressure / 1e-5, "1.400", MPA);
    // The real walls, t/r = 5 %, by hand: Q² = (80/84)², q² = (76/80)², p = 4e-4/(20.812/210e9 + 19.213/105e9).
    let (hoop, pressure) = rings.solve(1.0);
    assert_prints(hoop, "29.09", MPA);
    assert_prints(pressure, "1.418", MPA);
}

#[test]
fn brass_ring_in_a_thin_steel_ring() {
    // Beer & Johnston, Mechanics of Materials, 7th ed., problem 7.126 (from memory): interface 5 in, walls 1/8 and
    // 1/4 in, 29 and 15 Mpsi, 6.5e-6 and 11.6e-6 /°F, 75 °F warmer. Thin rings again.
    let inch = printed::INCH;
    let rings = WarmedRings {
        radius: 2.5 * inch,
        outer_wall: 0.125 * inch,
        inner_wall: 0.25 * inch,
        outer: (29e6 * PSI, 6.5e-6),
        inner: (15e6 * PSI, 11.6e-6),
        rise: 75.0,
    };
    let (hoop, pressure) = rings.solve(1e-5);
    assert_prints(hoop, "5.64", 1000.0 * PSI);
    assert_prints(pressure / 1e-5, "282", PSI);
}

#[test]
fn bronze_tube_in_a_steel_cylinder_warmed() {
    // Hearn, Mechanics of Materials 1, 3rd ed., thick cylinders (inputs read, answers from memory): tube 50/60 mm,
    // steel outside 100 mm, 100 and 200 GPa, 0.33 and 0.3, 19e-6 and 12e-6 /K, free at 15 °C, warmed to 115 °C.
    let tube = RingSection::new(0.025, 0.03, 100e9, 0.33, 0.0).unwrap();
    let cylinder = RingSection::new(0.03, 0.05, 200e9, 0.3, 0.0).unwrap();
    let warm = Pair::new(tube, cylinder, 0.0).warmed(19e-4, 12e-4);
    let pressure = warm.pressure();
    assert_prints(pressure, "10.9", MPA);
    // By hand: 7e-4 = p ((34/16 + 0.3)/200e9 + (61/11 − 0.33)/100e9).
    let flexibility = (34.0 / 16.0 + 0.3) / 200e9 + (61.0 / 11.0 - 0.33) / 100e9;
    assert_close(pressure, 7e-4 / flexibility, 1e-12);
    assert_prints(warm.stress(1, 0.05).hoop, "12.3", MPA);
    // DIFFERS: 23.3 is remembered for 23.1 at the bore of the cylinder, −71.2 and −60.3 for −71.3 and −60.4 at bore
    // and surface of the tube. Ours are multiples of the pressure: 34/16, −72/11 and −61/11.
    assert_close(warm.stress(1, 0.03).hoop, pressure * 34.0 / 16.0, 1e-12);
    assert_close(warm.stress(0, 0.025).hoop, -pressure * 72.0 / 11.0, 1e-12);
    assert_close(warm.stress(0, 0.03).hoop, -pressure * 61.0 / 11.0, 1e-12);
    assert_prints(warm.stress(1, 0.03).hoop, "23.1", MPA);
    assert_prints(warm.stress(0, 0.025).hoop, "-71.3", MPA);
    assert_prints(warm.stress(0, 0.03).hoop, "-60.4", MPA);
}

#[test]
fn aluminium_hub_on_a_steel_shaft_warmed_as_a_whole() {
    // German physics question board, worked answer: bore 120.000, shaft 120.101 mm, 22e-6 and 12e-6 /K, 0.050 mm of
    // play wanted: 126 K, 146 °C from 20 °C.
    let shaft = RingSection::new(0.0, 0.06, 210e9, 0.3, 7850.0).unwrap();
    let hub = RingSection::new(0.06, 0.1, 70e9, 0.33, 2700.0).unwrap();
    let play = |rise: f64| {
        let solution = Pair::new(shaft, hub, 101e-6).warmed(12e-6 * rise, 22e-6 * rise).0.solve().unwrap();
        2.0 * solution.gaps[0]
    };
    let rise = hubgrip::numerics::root::bracketed(|rise| play(rise) - 50e-6, 84.5, 300.0, 0.0).unwrap();
    assert_prints(rise, "126", 1.0);
    assert_prints(20.0 + rise, "146", 1.0);
    // No loosening rise is printed; ours with one diameter, δ/(d (α_h − α_s)).
    let loose = temperature::loosening_rise(101e-6, 0.12, 22e-6, 12e-6).unwrap().unwrap();
    assert_prints(loose, "84.1666667", 1.0);
    assert_eq!(play(84.0), 0.0);
    assert!(play(84.5) > 0.0);
}

#[test]
fn notch_factor_in_bending_against_tensile_strength() {
    // DIN 743-2:2000, table of notch factors, interference fit, reference diameter 40 mm (table from memory).
    for (strength, printed) in [
        (400e6, "1.8"),
        (500e6, "2.0"),
        (600e6, "2.2"),
        (700e6, "2.3"),
        (800e6, "2.5"),
        (900e6, "2.6"),
        (1000e6, "2.7"),
        (1100e6, "2.8"),
        (1200e6, "2.9"),
    ] {
        assert_prints(notch::press_fit_bending(strength).unwrap(), printed, 1.0);
    }
    // DIN 743-2:2000, parallel key; no value printed. Ours from the formula (from memory) by logarithms:
    // 3.0 · 0.6^0.38 = e^(1.0986123 − 0.38 · 0.5108256) = 2.47069.
    assert_prints(notch::key_seat_bending(600e6).unwrap(), "2.47069", 1.0);
    assert_prints(notch::key_seat_bending(1000e6).unwrap(), "3.0", 1.0);
    assert_prints(notch::key_seat_torsion(1000e6).unwrap(), "1.78", 1.0);
    assert_prints(notch::press_fit_torsion(1000e6).unwrap(), "1.755", 1.0);
}

#[test]
fn notch_factors_measured_on_press_fitted_shafts_surround_the_formula() {
    // Peterson / Pilkey, Stress Concentration Factors (figures from memory and uncertain), tests on 2 in shafts: 2.0
    // carbon, 2.3 and 2.9 alloy steel. A band, 2 to 3, in which the formula of DIN 743-2 must lie for axle steels.
    let bands = notch::MEASURED_IN_BENDING;
    assert!(bands.iter().all(|band| band.low <= band.high && !band.source.is_empty()));
    let horger = bands[0];
    assert_eq!((horger.low, horger.high), (2.0, 3.0));
    for strength in [600e6, 800e6, 1000e6] {
        let factor = notch::press_fit_bending(strength).unwrap();
        assert!(factor >= horger.low && factor <= horger.high, "{factor}");
    }
}
