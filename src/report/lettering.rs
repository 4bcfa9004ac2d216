//! Where the lettering of the figures of a page lies, for the tests.

use super::svg::{FONT, digits};
use super::text_width::text_width;
use super::well_formed::{Element, elements};

/// Fails when a line of lettering leaves its figure or touches another; returns the number of figures.
pub(crate) fn check(name: &str, page: &str) -> usize {
    let all = elements(page).unwrap_or_else(|fault| panic!("{name}: {fault}"));
    let figures: Vec<usize> = (0..all.len()).filter(|index| all[*index].name == "svg").collect();
    for figure in &figures {
        let id = all[*figure].attribute("id").unwrap();
        assert_eq!(all[*figure].attribute("font-family"), Some(FONT));
        let (lines, width, height) = lettering(&all, *figure);
        assert!(!lines.is_empty());
        for (place, one) in lines.iter().enumerate() {
            assert!(
                one.left >= -0.01 && one.right <= width + 0.01 && one.top >= -0.01 && one.bottom <= height,
                "{name} {id}: “{}” leaves the figure: {} to {} of {}, {} to {} of {}",
                one.text,
                digits(one.left),
                digits(one.right),
                digits(width),
                digits(one.top),
                digits(one.bottom),
                digits(height)
            );
            for other in &lines[place + 1..] {
                let apart = one.right <= other.left
                    || other.right <= one.left
                    || one.bottom <= other.top
                    || other.bottom <= one.top;
                assert!(apart, "{name} {id}: “{}” and “{}” overlap", one.text, other.text);
            }
        }
    }
    figures.len()
}

/// A line of lettering in a figure, in the units of its viewBox.
struct Line {
    text: String,
    left: f64,
    top: f64,
    right: f64,
    bottom: f64,
}

/// Lettering of one figure and the size of its viewBox.
fn lettering(all: &[Element], figure: usize) -> (Vec<Line>, f64, f64) {
    let view: Vec<f64> =
        all[figure].attribute("viewBox").unwrap().split(' ').map(|number| number.parse().unwrap()).collect();
    let lines = all
        .iter()
        .enumerate()
        .filter(|(index, element)| element.name == "text" && belongs(all, *index, figure))
        .map(|(index, element)| line(all, index, element, figure))
        .filter(|line| !line.text.is_empty())
        .collect();
    (lines, view[2], view[3])
}

/// Whether the element lies inside of another.
pub(crate) fn belongs(all: &[Element], index: usize, figure: usize) -> bool {
    let mut at = all[index].parent;
    while let Some(parent) = at {
        if parent == figure {
            return true;
        }
        at = all[parent].parent;
    }
    false
}

fn line(all: &[Element], index: usize, element: &Element, figure: usize) -> Line {
    let mut scale = 1.0;
    let mut at = all[index].parent;
    while let Some(parent) = at.filter(|parent| *parent != figure) {
        if all[parent].attribute("transform") == Some("scale(0.1)") {
            scale = 0.1;
        }
        at = all[parent].parent;
    }
    let size = element.number("font-size") * scale;
    let (x, mut y) = (element.number("x") * scale, element.number("y") * scale);
    // Plotters moves the baseline by dy: below the point, or to its middle.
    match element.attribute("dy") {
        Some("0.76em") => y += 0.76 * size,
        Some("0.5ex") => y += 0.25 * size,
        Some("-0.5ex") => y -= 0.25 * size,
        Some(other) => panic!("dy={other}"),
        None => {}
    }
    let text = element.text.trim().to_owned();
    // Without the 5 % that placing lettering adds for other faces.
    let width = text_width(&text, size) / 1.05;
    let start = match element.attribute("text-anchor") {
        Some("middle") => -0.5 * width,
        Some("end") => -width,
        _ => 0.0,
    };
    let (up, down) = (0.72 * size, 0.05 * size);
    let turned = element.attribute("transform").is_some_and(|turn| turn.starts_with("rotate(-90"));
    if turned {
        Line { text, left: x - up, right: x + down, top: y - start - width, bottom: y - start }
    } else {
        Line { text, left: x + start, right: x + start + width, top: y - up, bottom: y + down }
    }
}
