//! Random joints that a person might write, the same ones in every run.
#![allow(dead_code)]

use std::path::Path;

use hubgrip::joint::{Joint, read};
use hubgrip::material::library::Library;
use rand::{Rng, RngExt, SeedableRng};
use rand_xoshiro::Xoshiro256PlusPlus;

const MATERIALS: [&str; 9] = [
    "C45+N",
    "34CrNiMo6+QT",
    "42CrMo4+QT",
    "EN-GJL-250",
    "EN-GJS-400-15",
    "EN-AW-6082-T6",
    "S355J2",
    "CuSn12-C-GC",
    "X5CrNi18-10",
];

const FITS: [&str; 12] = [
    "H7/s6", "H7/u6", "H7/p6", "H8/x8", "S7/h6", "H7/k6", "H6/n5", "H7/r6", "H8/u8", "N7/h6", "U8/h7",
    "H8/za8",
];

/// A stream of random numbers that is the same in every run.
pub fn stream(seed: u64) -> Xoshiro256PlusPlus {
    Xoshiro256PlusPlus::seed_from_u64(seed)
}

/// A joint in parts, so that a test can leave one out or change it.
#[derive(Debug, Clone)]
pub struct Parts {
    pub diameter: f64,
    pub length: f64,
    pub relief: f64,
    pub bore: f64,
    pub outer: f64,
    pub shaft_material: &'static str,
    pub hub_material: &'static str,
    pub roughness: (f64, f64),
    pub fit: Option<&'static str>,
    pub lines: Vec<String>,
    pub duty: Vec<String>,
    pub require: String,
}

fn pick<T: Copy>(random: &mut impl Rng, from: &[T]) -> T {
    from[random.random_range(0..from.len())]
}

fn tenths(value: f64) -> f64 {
    (value * 10.0).round() / 10.0
}

/// A random joint; loads are of the order that its size can carry.
pub fn parts(random: &mut impl Rng) -> Parts {
    let diameter = tenths(10f64.powf(random.random_range(1.0..2.5)));
    let outer = tenths(diameter * random.random_range(1.3..3.0));
    let length = tenths(diameter * random.random_range(0.5..1.8));
    let bore = if random.random_bool(0.5) { 0.0 } else { tenths(diameter * random.random_range(0.1..0.6)) };
    let mut lines = Vec::new();
    if random.random_bool(0.6) {
        let low = (random.random_range(0.07..0.2f64) * 1000.0).round() / 1000.0;
        lines.push(format!("friction: {{holding: {low}, pressing: 0.06 to {}}}", low + 0.03));
    }
    let method = pick(random, &["press", "press", "heat hub", "chill shaft", "heat and chill"]);
    let shop = pick(random, &["20 degC", "20 degC", "15 degC", "25 degC"]);
    let bath = pick(random, &["dry ice", "liquid nitrogen"]);
    lines.push(format!("assembly: {{method: {method}, shop_temperature: {shop}, bath: {bath}}}"));
    if random.random_bool(0.5) {
        let at = pick(random, &["loosest", "both", "none"]);
        let factor = pick(random, &["0", "0.4", "0.8", "1.2"]);
        lines.push(format!("smoothing: {{factor: {factor}, at: {at}}}"));
    }
    if random.random_bool(0.3) {
        lines.push("criterion: Tresca".to_owned());
    }
    // A pressure of 5 to 60 MPa at a friction of 0.1 carries T = μ p π d² L/2.
    let pressure = random.random_range(5e6..60e6f64);
    let torque = 0.1 * pressure * std::f64::consts::PI * (diameter * 1e-3).powi(2) * length * 1e-3 / 2.0;
    let mut duty = Vec::new();
    for number in 0..random.random_range(1..4) {
        let share = random.random_range(0.2..1.0);
        let axial = if random.random_bool(0.4) { share * torque / (diameter * 1e-3) } else { 0.0 };
        let hot = random.random_bool(0.5);
        let temperatures = if hot && random.random_bool(0.2) {
            format!(
                ", inner_temperature: {} degC, outer_temperature: {} degC",
                random.random_range(10..70),
                random.random_range(10..70)
            )
        } else if hot {
            format!(
                ", shaft_temperature: {} degC, hub_temperature: {} degC",
                random.random_range(0..90),
                random.random_range(0..90)
            )
        } else {
            String::new()
        };
        let mut more = temperatures;
        if random.random_bool(0.3) {
            // A rim speed of up to 150 m/s.
            let speed = random.random_range(10.0..150.0f64) / (outer * 0.5e-3) * 30.0 / std::f64::consts::PI;
            more += &format!(", speed: {speed:.0} rpm");
        }
        if random.random_bool(0.15) {
            more += &format!(", outer_pressure: {} MPa", random.random_range(1..40));
        }
        if bore > 0.0 && random.random_bool(0.3) {
            more += &format!(", inner_pressure: {} MPa", random.random_range(1..120));
        }
        if random.random_bool(0.2) {
            let moment = share * torque * random.random_range(0.01..0.6);
            more += &format!(", bending_moment: {moment:.3} N.m, radial_force: {:.0} N", 0.1 * axial);
        }
        // Drawn from the numbers above, so that the stream of the other draws stays as it is.
        let drawn = (share * 1e4) as u64 % 10;
        if drawn < 3 {
            more += &format!(", relaxation: {}", 0.5 + 0.15 * drawn as f64);
        }
        duty.push(format!(
            "{{state: state {number}, torque: {:.3} N.m, axial_force: {axial:.1} N{more}}}",
            share * torque
        ));
    }
    let slip = pick(random, &["1.2", "1.5", "2"]);
    let strength = pick(random, &["1", "1.2", "1.5"]);
    let force = 10f64.powf(random.random_range(4.0..6.5));
    let limit = if random.random_bool(0.4) { format!(", press_force: {force:.0} N") } else { String::new() };
    Parts {
        diameter,
        length,
        relief: if random.random_bool(0.3) { tenths(0.1 * length) } else { 0.0 },
        bore,
        outer,
        shaft_material: pick(random, &MATERIALS[..3]),
        hub_material: pick(random, &MATERIALS),
        roughness: (pick(random, &[1.6, 4.0, 6.3]), pick(random, &[3.0, 6.3, 10.0])),
        fit: Some(pick(random, &FITS)),
        lines,
        duty,
        require: format!(
            "require: {{slip_safety: {slip}, yield_safety: {strength}, fracture_safety: 2{limit}}}"
        ),
    }
}

impl Parts {
    /// The joint file.
    pub fn text(&self) -> String {
        let mut text = format!(
            "joint_file: 1\ndiameter: {} mm\nlength: {} mm\nrelief: {} mm\n\
             shaft: {{material: {}, bore: {} mm, roughness: Rz {} um, section: 40 mm}}\n\
             hub: {{material: {}, outer_diameter: {} mm, roughness: Rz {} um, section: 20 mm}}\n",
            self.diameter,
            self.length,
            self.relief,
            self.shaft_material,
            self.bore,
            self.roughness.0,
            self.hub_material,
            self.outer,
            self.roughness.1
        );
        if let Some(fit) = self.fit {
            text += &format!("fit: {fit}\n");
        }
        for line in &self.lines {
            text += &format!("{line}\n");
        }
        text += "duty:\n";
        for state in &self.duty {
            text += &format!("  - {state}\n");
        }
        text + &self.require + "\n"
    }

    /// The joint, unless something does not go together, such as a fit that is not defined at the diameter.
    pub fn joint(&self, library: &Library) -> Option<Joint> {
        read::read(&self.text(), Path::new("random.yaml"), &[], library).ok()
    }
}
