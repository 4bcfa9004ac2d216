//! A population by integration and by random pairs, against published figures, closed forms and each other.

mod common;

use std::path::Path;

use approx::assert_relative_eq;
use common::{hubgrip_in, stderr, stdout};
use hubgrip::findings::compute;
use hubgrip::joint::read;
use hubgrip::material::Range;
use hubgrip::material::library::Library;
use hubgrip::population::distribution::{Distribution, normal};
use hubgrip::population::scatter::analysis::Analysis;
use hubgrip::population::scatter::model::{Arithmetic, Limit, Model, Population, State, Stiffness};
use hubgrip::population::scatter::simulation::Simulation;
use hubgrip::population::scatter::understood::{Understood, understood};
use hubgrip::population::scatter::{Quantity, Settings, scatter};
use rand::{Rng, SeedableRng};
use rand_xoshiro::Xoshiro256PlusPlus;

fn fixed(value: f64) -> Distribution {
    Distribution::fixed(value).unwrap()
}

/// Solid shaft of 50 mm in a hub of 100 mm, 40 mm long, E 200 GPa, ν 0.3: k = 1.5e12 Pa/m.
fn model(hole: Distribution, shaft: Distribution, friction: Distribution, loss: f64) -> Model {
    Model {
        population: Population {
            hole,
            shaft,
            hub_roughness: fixed(loss),
            shaft_roughness: fixed(0.0),
            friction,
            pressing: fixed(0.1),
            hub_modulus: fixed(200e9),
            shaft_modulus: fixed(200e9),
            hub_temperature: fixed(0.0),
            shaft_temperature: fixed(0.0),
        },
        smoothing_factor: 1.0,
        loss_when_holding: true,
        loss_under_stress: true,
        diameter: 0.05,
        engaged_length: 0.04,
        hub_factor: 1.25 / 0.75 + 0.3,
        shaft_factor: 0.7,
        hub_stress: 3.0625f64.sqrt() / 0.75,
        chamfer_slope: 5f64.to_radians().tan(),
        shop_thermal: 0.0,
        shop_stiffness: Stiffness::default(),
        states: vec![State {
            name: "rated".into(),
            force: 700.0 / 0.025,
            thermal: 0.0,
            stiffness: Stiffness::default(),
            warm: None,
        }],
        rings: vec![Limit {
            name: "hub".into(),
            failure: "yield",
            pressure: 170e6 * 0.75 / 3.0625f64.sqrt(),
            required: 1.2,
            in_states: Vec::new(),
        }],
        arithmetic: Arithmetic {
            interference: Range { low: 18e-6, high: 58e-6 },
            friction: Range { low: 0.1, high: 0.14 },
            pressing: Range { low: 0.1, high: 0.1 },
        },
    }
}

fn both_normal() -> Model {
    let (hole, shaft) = (Distribution::normal(12e-6, 4e-6), Distribution::normal(50e-6, 3e-6));
    model(hole.unwrap(), shaft.unwrap(), fixed(0.12), 0.0)
}

fn both_uniform() -> Model {
    let (hole, shaft) = (Distribution::uniform(0.0, 24e-6), Distribution::uniform(42e-6, 58e-6));
    model(hole.unwrap(), shaft.unwrap(), Distribution::uniform(0.10, 0.14).unwrap(), 5e-6)
}

fn both_truncated() -> Model {
    let hole = Distribution::truncated_normal(12e-6, 4e-6, 0.0, 24e-6).unwrap();
    let shaft = Distribution::truncated_normal(50e-6, 3e-6, 42e-6, 58e-6).unwrap();
    model(hole, shaft, Distribution::truncated_normal(0.12, 0.01, 0.09, 0.15).unwrap(), 5e-6)
}

/// Slip below 700 N·m and yield above 170 MPa, computed beforehand by two other methods (adaptive quadrature with a
/// closed-form density, and direct double integration).
#[test]
fn probabilities_have_every_digit_of_the_reference() {
    for (model, slip, yielding) in [
        (both_normal(), 4.042_338_40e-3, 1.724_543_59e-2),
        (both_uniform(), 0.194_893_238, 2.553_677_72e-2),
        (both_truncated(), 6.613_811_94e-2, 4.339_149_22e-4),
    ] {
        let analysis = Analysis::of(&model).unwrap();
        assert_relative_eq!(analysis.slip(0, 1.0), slip, max_relative = 2e-9);
        assert_relative_eq!(analysis.exceeds(0, model.rings[0].pressure), yielding, max_relative = 2e-9);
    }
}

/// Percentiles of the interference that grips, µm, as above.
#[test]
fn percentiles_have_every_digit_of_the_reference() {
    for (model, values) in [
        (both_uniform(), [14.018_233_8, 33.0, 51.981_766_2]),
        (both_truncated(), [18.750_065_1, 33.0, 47.249_934_9]),
    ] {
        let analysis = Analysis::of(&model).unwrap();
        for (level, value) in [0.001_35, 0.5, 0.998_65].into_iter().zip(values) {
            let found = analysis.quantile(Quantity::EffectiveInterference, level).unwrap() * 1e6;
            assert!((found - value).abs() < 6e-8, "{level}: {found}");
        }
    }
}

/// Two normals and a fixed friction: everything is Φ. The integration must hold it down to 1e-12.
#[test]
fn closed_form_where_both_are_normal_far_into_the_tails() {
    let mut model = both_normal();
    for z in [-7.0, -6.0, -4.0, -1.0, 0.5] {
        let interference = 38e-6 + z * 5e-6;
        // T = μ p π d² l/2 with p = 1.5e12 U.
        model.states[0].force = 0.12 * 1.5e12 * interference * model.area();
        let analysis = Analysis::of(&model).unwrap();
        assert_relative_eq!(analysis.slip(0, 1.0), normal::below(z), max_relative = 1e-6);
        let pressure = 1.5e12 * (38e-6 - z * 5e-6);
        assert_relative_eq!(analysis.exceeds(0, pressure), normal::below(z), max_relative = 1e-6);
    }
    let analysis = Analysis::of(&model).unwrap();
    for (level, z) in [(0.001_35, -2.999_976_99), (0.998_65, 2.999_976_99)] {
        let found = analysis.quantile(Quantity::Pressure, level).unwrap();
        assert_relative_eq!(found, 1.5e12 * (38e-6 + z * 5e-6), max_relative = 1e-8);
    }
}

/// D. C. Montgomery, *Introduction to Statistical Quality Control*: bearing 2.010 cm with s 0.002 cm, shaft 2.004 cm
/// with s 0.001 cm; the clearance is positive with 0.9964 (printed answer, from memory).
#[test]
fn clearance_of_a_shaft_in_a_bearing() {
    let (hole, shaft) = (Distribution::normal(0.1e-3, 20e-6), Distribution::normal(40e-6, 10e-6));
    let model = model(hole.unwrap(), shaft.unwrap(), fixed(0.12), 0.0);
    let analysis = Analysis::of(&model).unwrap();
    let clear = analysis.below(Quantity::Interference, 0.0);
    assert!((clear - 0.9964).abs() < 5e-5, "{clear}");
    assert_relative_eq!(clear, 0.996_354_821, max_relative = 1e-9);
}

/// Textbook exercises on the interference of normal sizes whose answers are not printed; the figures are
/// Φ of the difference over the root of the sum of squares. Bearings of 1.005 cm (s 0.003), shafts of 0.995 cm
/// (s 0.004): 0.02275 interfere, and at most one in twenty with 0.924967. Kapur & Lamberson, *Reliability in
/// Engineering Design*, exercise type: bearing 1.063 in (s 0.0025), shaft 1.048 in (s 0.005): 0.003645 interfere,
/// the clearance passed by 99 % is 50.68 µm. Bearing 5.40 mm (s 0.735), shaft 3.93 mm (s 0.413): 0.040615 interfere.
#[test]
fn interference_of_normal_sizes_in_the_exercises() {
    let interfere = |hole: (f64, f64), shaft: (f64, f64)| {
        let nominal = hole.0;
        let model = model(
            Distribution::normal(0.0, hole.1).unwrap(),
            Distribution::normal(shaft.0 - nominal, shaft.1).unwrap(),
            fixed(0.12),
            0.0,
        );
        let analysis = Analysis::of(&model).unwrap();
        let one_percent = -analysis.quantile(Quantity::Interference, 0.99).unwrap();
        (analysis.above(Quantity::Interference, 0.0), one_percent)
    };
    let (share, _) = interfere((10.05e-3, 30e-6), (9.95e-3, 40e-6));
    assert_relative_eq!(share, 0.022_750_131_9, max_relative = 1e-8);
    let at_most_one = (1.0 - share).powi(20) + 20.0 * share * (1.0 - share).powi(19);
    assert_relative_eq!(at_most_one, 0.924_967_301, max_relative = 1e-8);
    let (share, clearance) = interfere((27.0002e-3, 63.5e-6), (26.6192e-3, 127e-6));
    assert_relative_eq!(share, 0.003_645_179_05, max_relative = 1e-8);
    assert_relative_eq!(clearance, 50.681_128_9e-6, max_relative = 1e-8);
    let (share, _) = interfere((5.4e-3, 735e-6), (3.93e-3, 413e-6));
    assert_relative_eq!(share, 0.040_614_922_8, max_relative = 1e-8);
}

/// A random distribution about `middle` with a spread of `width`.
fn random(generator: &mut Xoshiro256PlusPlus, middle: f64, width: f64) -> Distribution {
    let share =
        |generator: &mut Xoshiro256PlusPlus| (generator.next_u64() >> 11) as f64 / (1u64 << 53) as f64;
    let sd = width * (0.5 + share(generator));
    let mean = middle + width * (share(generator) - 0.5);
    match generator.next_u64() % 6 {
        0 => fixed(mean),
        1 => Distribution::normal(mean, sd / 3.0).unwrap(),
        2 => Distribution::truncated_normal(mean, sd, middle - 1.5 * width, middle + 1.2 * width).unwrap(),
        3 => Distribution::uniform(mean - sd, mean + sd).unwrap(),
        4 => Distribution::skewed(mean, sd / 3.0, 1.6 * share(generator) - 0.8).unwrap(),
        _ => {
            let values: Vec<f64> = (0..6).map(|_| middle + 2.0 * width * (share(generator) - 0.5)).collect();
            Distribution::measured(&values).unwrap()
        }
    }
}

/// Random joints: every count lies where the integrated probability puts it, every sampled mean within five
/// standard errors.
#[test]
fn both_engines_agree_over_random_populations() {
    let mut generator = Xoshiro256PlusPlus::seed_from_u64(2026);
    let mut told = 0;
    for case in 0..16 {
        let hole = random(&mut generator, 12e-6, 6e-6);
        let shaft = random(&mut generator, 45e-6, 5e-6);
        let friction = random(&mut generator, 0.12, 0.012);
        let mut model = model(hole, shaft, friction, 0.0);
        model.smoothing_factor = 0.8;
        model.loss_under_stress = case % 2 == 0;
        model.shop_thermal = f64::from(case % 3) * 1e-6;
        model.states[0].thermal = f64::from(case % 5 - 2) * 3e-6;
        model.shop_stiffness = Stiffness { hub: 1.0 - 0.01 * f64::from(case % 2), shaft: 1.0 };
        model.states[0].stiffness =
            Stiffness { hub: 1.0 - 0.06 * f64::from(case % 3), shaft: 1.0 - 0.03 * f64::from(case % 4) };
        model.population.hub_roughness = random(&mut generator, 6e-6, 0.6e-6);
        model.population.shaft_roughness = random(&mut generator, 4e-6, 0.4e-6);
        if case % 8 == 0 {
            model.population.hub_modulus = random(&mut generator, 200e9, 6e9);
            model.population.shaft_modulus = random(&mut generator, 205e9, 4e9);
        }
        model.population.pressing = random(&mut generator, 0.11, 0.012);
        let settings = Settings { samples: 100_000, seed: case as u64, slip_safety: 1.5 };
        let scatter = scatter(model, settings).unwrap();
        for event in scatter.slips.iter().chain(&scatter.failures) {
            assert!(event.agrees(), "case {case}: {event:?}");
            told += usize::from(event.probability > 1e-3 && event.probability < 0.999);
        }
        for spread in &scatter.quantities {
            let (integrated, sampled) = (spread.moments, spread.sampled_moments);
            let slack = 5.0 * spread.standard_error + 1e-6 * integrated.0.abs();
            assert!(
                (integrated.0 - sampled.0).abs() <= slack,
                "case {case}: {:?} {integrated:?} {sampled:?}",
                spread.quantity
            );
            assert!(
                (integrated.1 - sampled.1).abs() <= 0.03 * integrated.1 + 1e-15,
                "case {case}: {:?}",
                spread.quantity
            );
        }
    }
    assert!(told > 12, "only {told} probabilities were neither near 0 nor near 1");
}

/// Shares of the variance of the capacity against their definition, Var(E[T | one])/Var(T), by nested sums.
#[test]
fn shares_of_the_variance_are_those_of_the_definition() {
    let mut model = both_truncated();
    model.population.hub_modulus = Distribution::uniform(180e9, 220e9).unwrap();
    let shares = hubgrip::population::scatter::shares::shares(&model);
    let share = |of: &str| shares.iter().find(|share| share.of == of).unwrap();
    let grid = |distribution: &Distribution| -> Vec<(f64, f64)> {
        let (low, high) = distribution.support();
        let points = 60;
        let all: Vec<(f64, f64)> = (0..points)
            .map(|i| low + (high - low) * (f64::from(i) + 0.5) / f64::from(points))
            .map(|x| (x, distribution.density(x)))
            .collect();
        let total: f64 = all.iter().map(|(_, density)| density).sum();
        all.into_iter().map(|(x, density)| (x, density / total)).collect()
    };
    let p = &model.population;
    let (hole, shaft, friction, modulus) =
        (grid(&p.hole), grid(&p.shaft), grid(&p.friction), grid(&p.hub_modulus));
    let mean = |f: &dyn Fn(f64) -> f64, law: &[(f64, f64)]| law.iter().map(|(x, w)| w * f(*x)).sum::<f64>();
    let stiffness = |e: f64| 1.0 / model.compliance(e, 200e9);
    let grip = mean(&|s| s, &shaft) - mean(&|h| h, &hole) - 5e-6;
    let (mu, k) = (mean(&|m| m, &friction), mean(&stiffness, &modulus));
    let second = mean(&|s| mean(&|h| (s - h - 5e-6f64).powi(2), &hole), &shaft)
        * mean(&|m| m * m, &friction)
        * mean(&|e| stiffness(e).powi(2), &modulus);
    let variance = second - (grip * mu * k).powi(2);
    let given_friction = mean(&|m| (grip * k * (m - mu)).powi(2), &friction) / variance;
    let given_modulus = mean(&|e| (grip * mu * (stiffness(e) - k)).powi(2), &modulus) / variance;
    assert_relative_eq!(share("friction").torque, given_friction, max_relative = 2e-3);
    assert_relative_eq!(share("hub Young's modulus").torque, given_modulus, max_relative = 2e-3);
    let sum: f64 = shares.iter().filter_map(|share| share.interference).sum();
    assert_relative_eq!(sum, 1.0, max_relative = 1e-12);
    let joint = 1.0 - shares.iter().map(|share| share.torque).sum::<f64>();
    assert!(joint > 0.0 && joint < 0.05, "{joint}");
}

#[test]
fn a_seed_gives_the_same_counts_on_any_number_of_threads() {
    let model = both_truncated();
    let analysis = Analysis::of(&model).unwrap();
    let run = |threads: usize, seed: u64| {
        let pool = rayon::ThreadPoolBuilder::new().num_threads(threads).build().unwrap();
        pool.install(|| Simulation::run(&model, 1.5, 200_000, seed, |quantity| analysis.support(quantity)))
    };
    assert_eq!(run(1, 3), run(2, 3));
    assert_eq!(run(2, 3), run(5, 3));
    assert_ne!(run(2, 3), run(2, 4));
}

#[test]
fn what_leaves_the_validity_is_refused() {
    let mut model = both_normal();
    model.population.friction = Distribution::normal(0.12, 0.02).unwrap();
    let error = Analysis::of(&model).err().unwrap();
    assert!(error.to_string().contains("friction may fall to zero"), "{error}");
    let settings = Settings { samples: 0, seed: 1, slip_safety: 1.0 };
    assert!(scatter(both_normal(), settings).is_err());
}

const JOINT: &str = "\
joint_file: 1
diameter: 60 mm
length: 70 mm
shaft: {material: C45+N, bore: 20 mm, roughness: Rz 6.3 um}
hub: {material: EN-GJL-250, outer_diameter: 120 mm, roughness: Rz 10 um}
fit: H7/s6
friction: {holding: 0.1 to 0.14, pressing: 0.08 to 0.14}
duty:
  - {state: rated, torque: 100 N.m, axial_force: 1 kN, shaft_temperature: 60 degC, hub_temperature: 45 degC}
";

/// The model at one pair is the findings at that pair.
#[test]
fn a_population_without_scatter_is_the_check_of_one_pair() {
    for (set, loosest) in
        [("hole: 60.030 mm\n  shaft: 60.053 mm", true), ("hole: 60.000 mm\n  shaft: 60.072 mm", false)]
    {
        let friction = if loosest { "0.1" } else { "0.14" };
        let text =
            format!("{JOINT}population:\n  {set}\n  friction: {friction}\n  pressing_friction: 0.14\n");
        let joint = read::read(&text, Path::new("joint.yaml"), &[], &Library::built_in()).unwrap();
        let model = understood(&joint, &mut |_, _| unreachable!("no list is named")).unwrap().model;
        let analysis = Analysis::of(&model).unwrap();
        let findings = compute(joint).unwrap();
        let pair = if loosest { &findings.extremes.loosest } else { &findings.extremes.tightest };
        let found = |quantity| analysis.quantile(quantity, 0.5).unwrap();
        assert_relative_eq!(found(Quantity::Interference), pair.interference, max_relative = 1e-9);
        assert_relative_eq!(found(Quantity::Pressure), pair.pressure_smoothed, max_relative = 1e-9);
        if loosest {
            assert_relative_eq!(found(Quantity::TorqueCapacity), pair.torque_capacity, max_relative = 1e-9);
        } else {
            assert_relative_eq!(found(Quantity::HubStress), pair.rings[1].equivalent, max_relative = 1e-9);
            assert_relative_eq!(found(Quantity::PressForce), pair.press_force.high, max_relative = 1e-9);
        }
        let safety = findings.duty[0].loosest.slip_safety.unwrap();
        if loosest {
            assert_eq!(analysis.slip(0, safety * 0.999_999), 0.0);
            assert_eq!(analysis.slip(0, safety * 1.000_001), 1.0);
        }
    }
}

/// What relaxes holds as the check says: both engines turn over at its safety, and the stresses stay.
#[test]
fn a_relaxed_state_slips_where_the_check_says() {
    let population =
        "population:\n  hole: 60.030 mm\n  shaft: 60.053 mm\n  friction: 0.1\n  pressing_friction: 0.14\n";
    let of = |text: &str| {
        let text = format!("{text}{population}");
        let joint = read::read(&text, Path::new("joint.yaml"), &[], &Library::built_in()).unwrap();
        let understood = understood(&joint, &mut |_, _| unreachable!("no list is named")).unwrap();
        (understood, compute(joint).unwrap())
    };
    let (fresh, _) = of(JOINT);
    let (relaxed, findings) = of(&JOINT.replace("torque:", "relaxation: 0.4, torque:"));
    let safety = findings.duty[0].loosest.slip_safety.unwrap();
    let analysis = Analysis::of(&relaxed.model).unwrap();
    assert_eq!(analysis.slip(0, safety * 0.999_999), 0.0);
    assert_eq!(analysis.slip(0, safety * 1.000_001), 1.0);
    for (required, share) in [(safety * 0.999_999, 0), (safety * 1.000_001, 1)] {
        let settings = Settings { samples: 1000, seed: 1, slip_safety: required };
        let counted = scatter(relaxed.model.clone(), settings).unwrap().slips[0].counted_below_required;
        assert_eq!(counted.count, share * 1000);
    }
    assert_eq!(fresh.model.rings, relaxed.model.rings);
    let said = |understood: &Understood, words: &str| {
        understood.assumed.iter().any(|sentence| sentence.contains(words))
    };
    assert!(said(&relaxed, "40 % of the pressure") && !said(&fresh, "relaxation"));
    let (bent, _) = of(&JOINT.replace("torque:", "bending_moment: 10 N.m, torque:"));
    assert!(said(&bent, "the bending does not count") && !said(&fresh, "does not count"));
}

/// Speed, pressures from outside and heat flow across a part count as in the check: both engines turn over at its safeties,
/// against slip at the loosest pair and of both parts at the tightest.
#[test]
fn a_state_at_speed_slips_and_yields_where_the_check_says() {
    let population = |hole: &str, shaft: &str| {
        format!(
            "population:\n  hole: {hole} mm\n  shaft: {shaft} mm\n  friction: 0.1\n  pressing_friction: 0.14\n"
        )
    };
    let at_rest = JOINT.replace(", shaft_temperature: 60 degC, hub_temperature: 45 degC", "");
    let read = |text: &str| read::read(text, Path::new("joint.yaml"), &[], &Library::built_in()).unwrap();
    let model =
        |text: &str| understood(&read(text), &mut |_, _| unreachable!("no list is named")).unwrap().model;
    for keys in [
        "speed: 6000 rpm, temperature: 30 degC",
        "outer_pressure: 6 MPa",
        "speed: 4000 rpm, inner_pressure: 20 MPa",
        "speed: 3000 rpm, inner_temperature: 50 degC, outer_temperature: 30 degC",
    ] {
        let text = at_rest.replace("torque:", &format!("{keys}, torque:"));
        let findings = compute(read(&text)).unwrap();
        let loosest = model(&format!("{text}{}", population("60.030", "60.053")));
        let slip = findings.duty[0].loosest.slip_safety.unwrap();
        let analysis = Analysis::of(&loosest).unwrap();
        assert_eq!(analysis.slip(0, slip * 0.999_999), 0.0, "{keys}");
        assert_eq!(analysis.slip(0, slip * 1.000_001), 1.0, "{keys}");
        for (required, share) in [(slip * 0.999_999, 0), (slip * 1.000_001, 1)] {
            let settings = Settings { samples: 1000, seed: 1, slip_safety: required };
            let counted = scatter(loosest.clone(), settings).unwrap().slips[0].counted_below_required;
            assert_eq!(counted.count, share * 1000, "{keys}");
        }
        let safety = |ring: usize| findings.duty[0].tightest.rings[ring].safety.unwrap();
        for (factor, share) in [(0.999_999, 0u64), (1.000_001, 1)] {
            let require = format!(
                "require: {{yield_safety: {:?}, fracture_safety: {:?}}}\n",
                safety(0) * factor,
                safety(1) * factor
            );
            let tightest = model(&format!("{text}{require}{}", population("60.000", "60.072")));
            let analysis = Analysis::of(&tightest).unwrap();
            let simulation = Simulation::run(&tightest, 1.0, 1000, 1, |quantity| tightest.limits(quantity));
            for (ring, counted) in tightest.rings.iter().zip(&simulation.failures) {
                let [_, wanted] = ring.in_condition(1);
                assert_eq!(analysis.exceeds(1, wanted), share as f64, "{keys}: {}", ring.name);
                assert_eq!(counted[1][1].count, share * 1000, "{keys}: {}", ring.name);
            }
        }
    }
}

#[test]
fn faults_of_the_population_are_told_with_their_place() {
    for (keys, message) in [
        ("hole: {sd: 4 um, cp: 1.0}", "one of `sd`, `cp`, `uniform`, `measured`"),
        ("hole: {cp: 1.0, cpk: 1.2}", "is above cp"),
        ("friction: {cp: 1.0}", "needs limits"),
        ("hole: {sd: 4}", "has no unit"),
        ("shaft: {sdd: 4 um}", "sdd"),
        ("shaft: {sd: 4 um, skewness: 2}", "between -0.95 and 0.95"),
        ("hub_temperature: {sd: -3 K}", "must be more than zero"),
    ] {
        let text = format!("{JOINT}population:\n  {keys}\n");
        let faults = read::read(&text, Path::new("joint.yaml"), &[], &Library::built_in()).unwrap_err();
        assert!(faults.iter().any(|fault| fault.message.contains(message)), "{keys}: {faults:?}");
        assert!(faults[0].place.is_some(), "{keys}");
    }
}

#[test]
fn the_examples_run_and_say_the_same_every_time() {
    let root = Path::new(env!("CARGO_MANIFEST_DIR"));
    for name in ["motor-hub.yaml", "measured-lots.yaml"] {
        let file = root.join("examples/population").join(name);
        let file = file.to_str().unwrap();
        let here = tempfile::tempdir().unwrap();
        let arguments = ["scatter", file, "--samples", "20000", "--seed", "5"];
        let first = hubgrip_in(here.path(), &arguments);
        assert!(stderr(&first).is_empty(), "{}", stderr(&first));
        assert_eq!(first.status.code(), Some(0));
        let text = stdout(&first);
        assert!(text.contains("HOW OFTEN") && text.contains("The two engines agree"), "{text}");
        let widest = text.lines().map(|line| line.chars().count()).max().unwrap_or(0);
        assert!(widest <= 80, "a line of {widest} characters:\n{text}");
        assert_eq!(text, stdout(&hubgrip_in(here.path(), &arguments)));
        let page = ["scatter", file, "--samples", "20000", "--seed", "5", "--json", "-o", "page.html"];
        let json = hubgrip_in(here.path(), &page);
        let value: serde_json::Value = serde_json::from_str(&stdout(&json)).unwrap();
        assert_eq!(value["scatter"], 1);
        assert_eq!(value["engines_agree"], true);
        assert!(value["slip"][0]["probability"].is_number());
        let html = std::fs::read_to_string(here.path().join("page.html")).unwrap();
        assert!(
            html.matches("<svg").count() == 4 && !html.contains("http://cdn") && !html.contains("<script")
        );
    }
}

#[test]
fn a_list_that_is_not_there_is_told() {
    let here = tempfile::tempdir().unwrap();
    let text = format!("{JOINT}population:\n  hole: {{measured: nowhere.csv}}\n");
    std::fs::write(here.path().join("joint.yaml"), text).unwrap();
    let output = hubgrip_in(here.path(), &["scatter", "joint.yaml"]);
    assert_eq!(output.status.code(), Some(2));
    assert!(stderr(&output).contains("nowhere.csv"), "{}", stderr(&output));
}

#[test]
fn slips_of_the_command_line_are_told() {
    let here = tempfile::tempdir().unwrap();
    std::fs::write(here.path().join("joint.yaml"), JOINT).unwrap();
    std::fs::write(here.path().join("holes.csv"), "diameter_mm\n6.001\n").unwrap();
    let before = std::fs::read(here.path().join("joint.yaml")).unwrap();
    for (arguments, message) in [
        (vec!["--samples", "-5"], "below zero"),
        (vec!["--samples", "many"], "write a whole number"),
        (vec!["--samples", "0"], "1 to 10000000000"),
        (vec!["--seed", "1.5"], "write a whole number"),
        (vec!["-o", "joint.yaml"], "would be overwritten"),
        (vec!["-o", "no/page.html"], "the folder no does not exist"),
        (vec!["--set", "population.hole={measured: holes.csv}"], "5 % off the diameter of the joint, 60 mm"),
        (vec!["--set", "population.hole={measured: .}"], "this is a folder"),
        (vec!["--set", "require.allow=plastic"], "--set require.allow: "),
    ] {
        let all: Vec<&str> = ["scatter", "joint.yaml"].into_iter().chain(arguments).collect();
        let output = hubgrip_in(here.path(), &all);
        assert_eq!((output.status.code(), stdout(&output).as_str()), (Some(2), ""), "{all:?}");
        assert!(stderr(&output).contains(message), "{all:?}: {}", stderr(&output));
    }
    assert_eq!(std::fs::read(here.path().join("joint.yaml")).unwrap(), before);
    let run = |more: &[&str]| {
        let output = hubgrip_in(here.path(), &[&["scatter", "joint.yaml", "--samples"], more].concat());
        assert_eq!(output.status.code(), Some(0), "{}", stderr(&output));
        stdout(&output)
    };
    assert_eq!(run(&["1e4"]), run(&["10_000"]));
    let text = run(&["1e4", "--set", "population.hole={cp: 1.33, cpk: -0.2}"]);
    assert!(text.split_whitespace().collect::<Vec<_>>().join(" ").contains("cpk is below zero"), "{text}");
}

/// What the model cannot take of a population is told where it stands.
#[test]
fn a_population_that_cannot_be_worked_out_is_refused_at_its_key() {
    let here = tempfile::tempdir().unwrap();
    let text = JOINT.to_owned() + "population:\n  friction: {mean: 0.1, sd: 0.02, truncated: -0.01 to 0.2}\n";
    std::fs::write(here.path().join("joint.yaml"), text).unwrap();
    let output = hubgrip_in(here.path(), &["scatter", "joint.yaml"]);
    let error = stderr(&output);
    assert!(output.status.code() == Some(2) && error.starts_with("joint.yaml:11:3: "), "{error}");
}
