//! What one joint costs: reading, limits, a full check, a report.
//!
//! Run with `cargo bench`. The figures are those of the machine it runs on; compare ratios.

use std::path::Path;

use divan::{Bencher, black_box};
use hubgrip::findings::compute;
use hubgrip::joint::{Joint, read};
use hubgrip::material::library::Library;
use hubgrip::quantity::{Kind, parse};
use hubgrip::report::{html, json, terminal};
use hubgrip::tolerance::callout::FitCallout;

const FAN_HUB: &str = include_str!("../examples/fan-hub.yaml");

fn main() {
    divan::main();
}

fn joint() -> Joint {
    read::read(FAN_HUB, Path::new("fan-hub.yaml"), &[], &Library::built_in()).expect("the example is right")
}

#[divan::bench]
fn parse_a_quantity() -> f64 {
    parse(Kind::Length, black_box("2-3/16 in")).expect("it is a length")
}

#[divan::bench]
fn limits_of_an_iso_fit() -> f64 {
    let fit = FitCallout::parse(black_box("H7/u6")).expect("it is a fit");
    fit.resolve(black_box(0.06)).expect("it is defined").limits.hole.upper
}

#[divan::bench]
fn read_a_joint_file(bencher: Bencher) {
    let library = Library::built_in();
    bencher.bench_local(|| read::read(black_box(FAN_HUB), Path::new("fan-hub.yaml"), &[], &library));
}

#[divan::bench]
fn full_check(bencher: Bencher) {
    let joint = joint();
    bencher.with_inputs(|| joint.clone()).bench_local_values(|joint| compute(black_box(joint)));
}

#[divan::bench]
fn terminal_text(bencher: Bencher) {
    let findings = compute(joint()).expect("it can be computed");
    bencher.bench_local(|| terminal::text(black_box(&findings)));
}

#[divan::bench]
fn findings_as_json(bencher: Bencher) {
    let findings = compute(joint()).expect("it can be computed");
    bencher.bench_local(|| json::to_json(black_box(&findings)));
}

#[divan::bench]
fn full_report(bencher: Bencher) {
    let findings = compute(joint()).expect("it can be computed");
    bencher.bench_local(|| html::html(black_box(&findings)));
}
