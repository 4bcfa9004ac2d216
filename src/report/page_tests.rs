//! What must hold of every report, whatever the joint.

use std::sync::OnceLock;

use super::html::html;
use super::typeset::prose;
use super::well_formed::elements;
use super::{lettering, sample};

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

#[test]
fn lettering_of_the_figures_stays_inside_and_apart() {
    for (name, page) in pages() {
        assert!(lettering::check(name, page) >= 2, "{name}: figures are missing");
    }
}

/// Text of all elements inside the section with this id.
fn text_of(page: &str, id: &str) -> String {
    let all = elements(page).unwrap();
    let section = all.iter().position(|element| element.attribute("id") == Some(id)).unwrap();
    let inside = |index: usize| index == section || lettering::belongs(&all, index, section);
    let texts: Vec<&str> =
        (0..all.len()).filter(|index| inside(*index)).map(|index| all[index].text.trim()).collect();
    texts.join(" ")
}

#[test]
fn the_verdict_says_in_words_what_is_met() {
    let met = text_of(&html(&sample::fan_hub()), "answers");
    assert!(met.contains("All requirements are met.") && !met.contains("NOT"), "{met}");
    assert!(met.contains("press in with up to"), "{met}");
    let missed = text_of(&html(&sample::yielding()), "answers");
    assert!(missed.contains("does NOT keep its strength") && missed.contains("NOT MET"), "{missed}");
    let unloaded = text_of(&html(&sample::clearance()), "answers");
    assert!(unloaded.contains("Holding is not judged"), "{unloaded}");
}

#[test]
fn every_line_of_the_worksheet_is_there_as_plain_text_too() {
    let findings = sample::fan_hub();
    let page = html(&findings);
    let text = text_of(&page, "worksheet");
    let sections = findings.worksheet();
    for line in sections.iter().flat_map(|section| &section.lines) {
        let plain = match &line.formula {
            Some(formula) => format!("{} = {}", line.symbol.plain(), formula.plain()),
            None => format!("{} = {}", line.symbol.plain(), line.printed),
        };
        assert!(text.contains(&plain), "{plain}");
        assert!(text.contains(&line.source), "{}", line.source);
    }
    let lines: usize = sections.iter().map(|section| section.lines.len()).sum();
    let typeset = elements(&page).unwrap().iter().filter(|e| e.attribute("alttext").is_some()).count();
    assert_eq!(typeset, lines);
}

#[test]
fn defaults_are_marked_with_their_source() {
    let findings = sample::fan_hub();
    let text = text_of(&html(&findings), "inputs");
    for default in &findings.joint.defaults {
        assert!(text.contains(&default.key) && text.contains(&default.source), "{}", default.key);
    }
    assert_eq!(text.matches("default ").count(), findings.joint.defaults.len(), "{text}");
}

#[test]
fn cautions_stand_beside_their_step_and_again_in_full() {
    for (findings, subject) in [(sample::fan_hub(), "press"), (sample::hollow_shaft(), "heat")] {
        let page = html(&findings);
        let (steps, notes) = (text_of(&page, "assembly"), text_of(&page, "notes"));
        let cautions: Vec<_> = findings.cautions.iter().filter(|c| c.subject == subject).collect();
        assert!(!cautions.is_empty());
        for caution in cautions {
            let text = prose(&caution.text);
            assert!(steps.contains(&text) && notes.contains(&text), "{text}");
        }
    }
}

#[test]
fn an_inch_page_shows_inch_units_in_every_table_of_results() {
    let (_, page) = pages().iter().find(|(name, _)| *name == "hollow_shaft_inch").unwrap();
    for id in ["extremes", "duty"] {
        let text = text_of(page, id);
        for unit in ["MPa", "µm", "kN", "N·m", "°C"] {
            assert!(!text.contains(unit), "{id}: {unit}");
        }
    }
    assert!(text_of(page, "extremes").contains("lbf·ft"));
}
