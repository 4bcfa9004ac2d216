//! Sizes a hub with the library: the least outer diameter at which a fit keeps the hub elastic.
//!
//! Run with `cargo run --example size_a_hub`. The joint is invented.

use hubgrip::mechanics::criteria;
use hubgrip::mechanics::two_rings::TwoRings;
use hubgrip::tolerance::callout::FitCallout;

const DIAMETER: f64 = 0.060;
const YIELD_STRENGTH: f64 = 355e6;
const WANTED_SAFETY: f64 = 1.2;

fn main() -> Result<(), Box<dyn std::error::Error>> {
    let fit = FitCallout::parse("H7/s6")?.resolve(DIAMETER)?;
    let tightest = fit.limits.interference().tightest;
    println!("60 mm H7/s6: tightest interference {:.1} µm", tightest * 1e6);

    for outer_millimetres in (80..=200).step_by(5) {
        let outer_diameter = f64::from(outer_millimetres) * 1e-3;
        let joint = TwoRings {
            diameter: DIAMETER,
            hub_outer_diameter: outer_diameter,
            shaft_bore: 0.0,
            hub_youngs_modulus: 210e9,
            hub_poisson: 0.3,
            shaft_youngs_modulus: 210e9,
            shaft_poisson: 0.3,
        };
        let pressure = joint.pressure(tightest)?;
        let hoop = pressure * joint.hub_hoop_factor();
        let safety = YIELD_STRENGTH / criteria::von_mises(-pressure, hoop);
        println!("hub {outer_millimetres} mm: {:6.1} MPa, safety against yield {safety:.2}", pressure * 1e-6);
        if safety >= WANTED_SAFETY {
            println!("{outer_millimetres} mm is enough for a safety of {WANTED_SAFETY}");
            return Ok(());
        }
    }
    println!("no hub up to 200 mm is enough: choose a looser fit or a stronger hub");
    Ok(())
}
