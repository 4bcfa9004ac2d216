//! Comparison with a printed answer: ours must round to what is printed.
#![allow(dead_code)]

/// Inch, m (exact by definition).
pub const INCH: f64 = 0.0254;
/// Pound-force per square inch, Pa (NIST SP 811:2008, appendix B.8).
pub const PSI: f64 = 6894.757293168;
/// Megapascal, Pa.
pub const MPA: f64 = 1e6;

/// Asserts that `ours`, told in `unit`, is within half of the last digit of the `printed` text.
pub fn assert_prints(ours: f64, printed: &str, unit: f64) {
    let decimals = printed.split_once('.').map_or(0, |(_, decimals)| decimals.len());
    assert_prints_to(ours, printed, unit, 0.5 * 10f64.powi(-(decimals as i32)));
}

/// Asserts that `ours`, told in `unit`, is within `slack` (in that unit) of the `printed` text.
pub fn assert_prints_to(ours: f64, printed: &str, unit: f64, slack: f64) {
    let value: f64 = printed.parse().expect("the printed answer is a number");
    let told = ours / unit;
    assert!(
        (told - value).abs() <= slack * (1.0 + 1e-9),
        "ours is {told}, printed is {printed}, allowed {slack}"
    );
}

/// Asserts that `ours` equals our own second computation to the digits in which that is written here.
pub fn assert_close(ours: f64, second: f64, relative: f64) {
    let scale = ours.abs().max(second.abs());
    assert!(
        (ours - second).abs() <= relative * scale,
        "ours is {ours}, the second computation gives {second}"
    );
}
