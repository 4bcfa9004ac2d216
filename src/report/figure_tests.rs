//! What must hold of drawing and plots for every proportion of a joint.

use super::{drawing, lettering, plot, sample};
use crate::findings::Findings;
use crate::joint::Joint;
use crate::quantity::UnitSystem;
use crate::tolerance::Limits;

/// Sets the sizes of a joint of two rings, m.
fn resize(joint: &mut Joint, bore: f64, diameter: f64, outer: f64, length: f64, relief: f64) {
    joint.diameter = diameter;
    joint.length = length;
    joint.relief = relief;
    joint.rings[0].inner_diameter = bore;
    joint.rings[0].outer_diameter = diameter;
    joint.rings[1].inner_diameter = diameter;
    joint.rings[1].outer_diameter = outer;
    joint.fits[0].limits.nominal = diameter;
}

fn check(name: &str, svg: &str) {
    assert_eq!(lettering::check(name, svg), 1);
    assert!(!svg.contains("NaN") && !svg.contains("inf"), "{name}");
}

#[test]
fn a_section_of_any_proportion_keeps_its_lettering_inside_and_apart() {
    let mut findings = sample::fan_hub();
    for display in [UnitSystem::Metric, UnitSystem::Inch] {
        findings.joint.display = display;
        for inner in [0.0, 0.03, 0.98] {
            for ratio in [1.02, 1.3, 2.0, 30.0] {
                for slenderness in [0.02, 0.5, 3.0, 60.0] {
                    for diameter in [0.0012, 0.0607, 2.5] {
                        for relief in [0.0, 0.1] {
                            let length = slenderness * diameter;
                            let bore = inner * diameter;
                            resize(
                                &mut findings.joint,
                                bore,
                                diameter,
                                ratio * diameter,
                                length,
                                relief * length,
                            );
                            let name =
                                format!("{inner} {ratio} {slenderness} {diameter} {relief} {display:?}");
                            check(&name, &drawing::section(&findings).svg.into_string());
                        }
                    }
                }
            }
        }
    }
}

#[test]
fn a_section_with_words_as_long_as_you_like_stays_inside() {
    let mut findings = sample::three_rings();
    let long = "a designation that goes on and on ".repeat(6);
    for ring in &mut findings.joint.rings {
        ring.name = long.clone();
        std::sync::Arc::make_mut(&mut ring.material).name = long.clone();
    }
    for fit in &mut findings.joint.fits {
        fit.callout = long.clone();
    }
    check("long words", &drawing::section(&findings).svg.into_string());
    check("long words", &plot::tolerance_zones(&findings).svg.into_string());
    check("long words", &plot::stress(&findings).unwrap().svg.into_string());
    check("long words", &plot::diameters(&findings).unwrap().svg.into_string());
}

/// Sizes of the drawing follow from ISO 5455 at 1 : 2: 110 mm are 55 mm on paper, 70 mm are 35 mm.
#[test]
fn the_section_is_to_scale() {
    let svg = drawing::section(&sample::fan_hub()).svg.into_string();
    let all = super::well_formed::elements(&svg).unwrap();
    let texts: Vec<&str> = all.iter().filter(|e| e.name == "text").map(|e| e.text.as_str()).collect();
    for figure in ["Ø60 H7/s6", "Ø110", "67", "relief 3", "70", "scale 1 : 2 · sizes in millimetres"] {
        assert!(texts.contains(&figure), "{figure} is missing of {texts:?}");
    }
    // The upright dimension line of the outer diameter and the level one of the length.
    let lengths: Vec<f64> = all
        .iter()
        .filter(|e| e.name == "line")
        .map(|e| (e.number("x2") - e.number("x1")).hypot(e.number("y2") - e.number("y1")))
        .collect();
    for expected in [55.0, 30.0, 35.0, 33.5] {
        assert!(lengths.iter().any(|length| (length - expected).abs() < 0.02), "{expected} of {lengths:?}");
    }
}

#[test]
fn zones_of_any_limits_keep_their_lettering_apart() {
    let mut findings = sample::fan_hub();
    let um = 1e-6;
    for hole in [(0.0, 30.0), (0.0, 0.0), (-12.0, 13.0), (0.0, 1.0), (11.9, 12.1)] {
        for shaft in [(53.0, 72.0), (0.0, 0.0), (2.0, 2.0), (30.0, 31.0), (-400.0, -390.0), (1500.0, 1501.0)]
        {
            findings.joint.fits[0].limits.hole = Limits { lower: hole.0 * um, upper: hole.1 * um };
            findings.joint.fits[0].limits.shaft = Limits { lower: shaft.0 * um, upper: shaft.1 * um };
            check(&format!("{hole:?} {shaft:?}"), &plot::tolerance_zones(&findings).svg.into_string());
        }
    }
}

/// The findings with every stress of one ring times a factor.
fn stressed(mut findings: Findings, ring: usize, factor: f64) -> Findings {
    let extremes = &mut findings.extremes;
    for pair in [&mut extremes.loosest, &mut extremes.mean, &mut extremes.tightest] {
        let ring = &mut pair.rings[ring];
        ring.bore.radial *= factor;
        ring.rim.radial *= factor;
        ring.equivalent *= factor;
    }
    findings
}

#[test]
fn stress_of_any_height_keeps_its_lettering_apart() {
    for findings in [sample::fan_hub(), sample::hollow_shaft(), sample::three_rings(), sample::thin_bush()] {
        for factor in [1e-3, 0.3, 3.0, 1e3] {
            for ring in 0..2 {
                let plot = plot::stress(&stressed(findings.clone(), ring, factor)).unwrap();
                check(&format!("{} {ring} {factor}", findings.joint.title), &plot.svg.into_string());
            }
        }
    }
}

#[test]
fn a_plot_that_has_nothing_to_show_is_left_out() {
    let findings = sample::clearance();
    assert!(plot::stress(&findings).is_none());
    assert!(plot::press_force(&findings).is_none());
}

#[test]
fn captions_say_what_to_see_with_its_numbers() {
    let findings = sample::yielding();
    let stress = plot::stress(&findings).unwrap().caption;
    let web = &findings.extremes.tightest.rings[1];
    let share = 100.0 * web.equivalent / web.strength.unwrap();
    assert!(stress.contains(&format!("{share:.0}\u{202F}% of yield")), "{stress}");
    assert!(stress.contains("as if it stayed elastic"), "{stress}");
    assert!(plot::tolerance_zones(&findings).caption.contains("152\u{202F}µm"));
    let transition = plot::tolerance_zones(&sample::transition()).caption;
    assert!(transition.contains("the loosest pair has a clearance of 10\u{202F}µm"), "{transition}");
}
