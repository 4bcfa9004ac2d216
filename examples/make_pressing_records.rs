//! Makes the invented press-in records in `examples/pressing/`: 30 pinions of one shift, 3 of them bad.
//!
//! Run with `cargo run --example make_pressing_records`; another folder may be named behind `--`. The same bytes come
//! out every time: the parts, the friction and the noise are drawn by a fixed sequence.
//!
//! | record | what happens in it |
//! |---|---|
//! | 08 | galls: from 45 % of the travel on the friction grows to 2.4 times |
//! | 17 | enters askew: a hump of a third of the end force over the first 8 mm, then it falls |
//! | 26 | bore too large: it grips with 6 µm only |
//! | all others | a pair within the tolerances, friction between 0.09 and 0.125 |
//!
//! Each has an approach of 1.5 mm, a first touch within ±0.3 mm of zero, and noise of ±0.6 % of its end force.

use std::error::Error;
use std::fmt::Write;
use std::path::{Path, PathBuf};
use std::{env, fs};

use hubgrip::assembly::press::{PressInput, force_at};
use hubgrip::findings::{self, Findings};
use hubgrip::joint::read;
use hubgrip::material::library::Library;

/// Number of records.
pub const RECORDS: u32 = 30;
const STEP: f64 = 0.2e-3;
const APPROACH: f64 = 1.5e-3;

#[allow(dead_code)]
fn main() -> Result<(), Box<dyn Error>> {
    let home = Path::new(env!("CARGO_MANIFEST_DIR")).join("examples/pressing");
    let target = env::args_os().nth(1).map_or(home.clone(), PathBuf::from);
    let joint = fs::read_to_string(home.join("joint.yaml"))?;
    for (name, text) in records(&joint)? {
        fs::write(target.join(&name), text)?;
    }
    println!("{RECORDS} records in {}", target.display());
    Ok(())
}

/// Name and text of every record of a joint.
pub fn records(joint: &str) -> Result<Vec<(String, String)>, Box<dyn Error>> {
    let joint = read::read(joint, Path::new("joint.yaml"), &[], &Library::built_in())
        .map_err(|faults| faults.iter().map(ToString::to_string).collect::<Vec<_>>().join("; "))?;
    let findings = findings::compute(joint)?;
    let mut draw = Draw(2026);
    (1..=RECORDS).map(|number| record(&findings, number, &mut draw)).collect()
}

fn record(findings: &Findings, number: u32, draw: &mut Draw) -> Result<(String, String), Box<dyn Error>> {
    let joint = &findings.joint;
    let (loosest, tightest) = (&findings.extremes.loosest, &findings.extremes.tightest);
    let share = 0.5 * (draw.next() + draw.next());
    let within = loosest.effective_interference
        + share * (tightest.effective_interference - loosest.effective_interference);
    let interference = if number == 26 { 6e-6 } else { within };
    let friction = 0.09 + 0.035 * draw.next();
    let touch = 0.3e-3 * (2.0 * draw.next() - 1.0);
    let input = PressInput {
        pressure: tightest.pressure * interference / tightest.effective_interference,
        interference,
        diameter: joint.diameter,
        length: joint.engaged_length(),
        friction,
        chamfer_angle: joint.assembly.chamfer_angle.value,
    };
    let length = input.length;
    let end = force_at(&input, length)?;
    let mut text = format!("# Invented demo data: pinion {number:02}\ntravel (mm);force (kN)\n");
    let rows = ((length + APPROACH) / STEP).round() as u32;
    for row in 0..=rows {
        let travel = f64::from(row) * STEP - APPROACH;
        let depth = travel - touch;
        let smooth = if depth > 0.0 { force_at(&input, depth)? } else { 0.0 };
        let noise = 0.006 * end * (2.0 * draw.next() - 1.0);
        let force = smooth + noise + trouble(number, depth / length, end, smooth);
        writeln!(text, "{:.2};{:.3}", travel * 1e3, force * 1e-3)?;
    }
    Ok((format!("pinion-{number:02}.csv"), text.replace(";-0.000", ";0.000")))
}

/// What goes wrong: force added at a share of the travel.
fn trouble(number: u32, share: f64, end: f64, smooth: f64) -> f64 {
    match number {
        8 if share > 0.45 => smooth * 1.4 * ((share - 0.45) / 0.55).powi(2),
        17 if (0.0..0.22).contains(&share) => 0.33 * end * (share / 0.22 * std::f64::consts::PI).sin(),
        _ => 0.0,
    }
}

/// Numbers from 0 to 1 in a fixed sequence: SplitMix64 (Steele, Lea, Flood: Fast splittable pseudorandom number
/// generators, 2014).
struct Draw(u64);

impl Draw {
    fn next(&mut self) -> f64 {
        self.0 = self.0.wrapping_add(0x9E37_79B9_7F4A_7C15);
        let mut mixed = self.0;
        mixed = (mixed ^ (mixed >> 30)).wrapping_mul(0xBF58_476D_1CE4_E5B9);
        mixed = (mixed ^ (mixed >> 27)).wrapping_mul(0x94D0_49BB_1331_11EB);
        ((mixed ^ (mixed >> 31)) >> 11) as f64 / (1u64 << 53) as f64
    }
}
