//! What must hold of every report, whatever the joint.

use std::sync::OnceLock;

use super::html::html;
use super::sample;
use super::svg::{FONT, digits};
use super::text_width::text_width;
use super::well_formed::{Element, elements};

/// Pages of all samples. With HUBGRIP_PAGES set to a folder they are written there too, to be looked at.
fn pages() -> &'static [(&'static str, String)] {
    static PAGES: OnceLock<Vec<(&'static str, String)>> = OnceLock::new();
    PAGES.get_or_init(made)
}

fn made() -> Vec<(&'static str, String)> {
    let folder = std::env::var_os("HUBGRIP_PAGES").map(std::path::PathBuf::from);
    sample::all()
        .into_iter()
        .map(|(name, findings)| {
            let page = html(&findings);
            if let Some(folder) = &folder {
                std::fs::write(folder.join(format!("{name}.html")), &page).unwrap();
            }
            (name, page)
        })
        .collect()
}

#[test]
fn every_page_is_well_formed() {
    for (name, page) in pages() {
        if let Err(fault) = elements(page) {
            panic!("{name}: {fault}");
        }
    }
}

#[test]
fn the_same_findings_give_the_same_bytes() {
    assert_eq!(html(&sample::three_rings()), html(&sample::three_rings()));
}

#[test]
fn no_text_of_the_user_becomes_markup() {
    let page = html(&sample::hostile());
    assert!(!page.contains("<script"), "a script came through");
    let all = elements(&page).unwrap();
    assert!(all.iter().all(|element| element.name != "script"));
    let heading = all.iter().find(|element| element.name == "h1").unwrap();
    assert!(heading.text.starts_with("</title></svg><script>alert(\"1\")</script> & 'x'"));
}

#[test]
fn nothing_is_fetched_and_nothing_runs() {
    for (name, page) in pages() {
        for element in elements(page).unwrap() {
            assert!(
                !matches!(element.name.as_str(), "script" | "link" | "img" | "iframe" | "object"),
                "{name}"
            );
            for (key, value) in &element.attributes {
                assert!(!key.starts_with("on"), "{name}: {key}");
                assert!(!value.contains("http") || key == "xmlns", "{name}: {key}={value}");
                assert!(!matches!(key.as_str(), "href" | "src") || value.starts_with('#'), "{name}: {value}");
            }
            if element.name == "style" {
                assert!(!element.text.contains("url(") && !element.text.contains("@import"));
            }
        }
    }
}

#[test]
fn no_number_is_missing_its_value() {
    for (name, page) in pages() {
        let text: String = elements(page).unwrap().into_iter().map(|element| element.text + " ").collect();
        for word in text.split(|c: char| !c.is_alphanumeric()) {
            assert!(!matches!(word, "NaN" | "inf" | "Inf"), "{name}: {word}");
        }
        assert!(!text.contains("e-") || !text.contains("·10⁻¹⁵"), "{name}: noise of rounding is shown");
    }
}

#[test]
fn identifiers_are_unique_and_references_lead_somewhere() {
    for (name, page) in pages() {
        let all = elements(page).unwrap();
        let mut ids: Vec<&str> = all.iter().filter_map(|element| element.attribute("id")).collect();
        let count = ids.len();
        ids.sort_unstable();
        ids.dedup();
        assert_eq!(ids.len(), count, "{name}");
        for element in &all {
            for key in ["aria-labelledby", "aria-describedby"] {
                if let Some(target) = element.attribute(key) {
                    assert!(ids.contains(&target), "{name}: {target}");
                }
            }
            if let Some(target) = element.attribute("href") {
                assert!(ids.contains(&target.trim_start_matches('#')), "{name}: {target}");
            }
        }
    }
}

#[test]
fn pictures_and_tables_can_be_used_without_seeing_them() {
    for (name, page) in pages() {
        let all = elements(page).unwrap();
        for (index, element) in all.iter().enumerate() {
            let inside = |tag: &str| all.iter().any(|other| other.name == tag && other.parent == Some(index));
            match element.name.as_str() {
                "svg" => {
                    assert_eq!(element.attribute("role"), Some("img"));
                    assert!(element.attribute("aria-label").is_some_and(|label| !label.is_empty()));
                    assert!(inside("title") && inside("desc"), "{name}");
                }
                "figure" => assert!(inside("figcaption"), "{name}"),
                "th" => assert!(element.attribute("scope").is_some(), "{name}: th without scope"),
                "table" => assert!(inside("thead"), "{name}: table without head"),
                _ => {}
            }
        }
        for landmark in ["header", "nav", "main", "footer"] {
            assert_eq!(
                all.iter().filter(|element| element.name == landmark).count(),
                1,
                "{name}: {landmark}"
            );
        }
        assert_eq!(all.iter().filter(|element| element.name == "h1").count(), 1, "{name}");
    }
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

fn belongs(all: &[Element], index: usize, figure: usize) -> bool {
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

#[test]
fn lettering_of_the_figures_stays_inside_and_apart() {
    for (name, page) in pages() {
        let all = elements(page).unwrap();
        let figures: Vec<usize> = (0..all.len()).filter(|index| all[*index].name == "svg").collect();
        assert!(figures.len() >= 2, "{name}");
        for figure in figures {
            let id = all[figure].attribute("id").unwrap();
            assert_eq!(all[figure].attribute("font-family"), Some(FONT));
            let (lines, width, height) = lettering(&all, figure);
            assert!(!lines.is_empty());
            for (place, one) in lines.iter().enumerate() {
                assert!(
                    one.left >= -0.01
                        && one.right <= width + 0.01
                        && one.top >= -0.01
                        && one.bottom <= height,
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
    }
}
