//! The shell every page stands in: one file that needs no network and no script, well-formed XML as well as HTML.

use maud::{Markup, PreEscaped, html};

const STYLE: &str = include_str!("page.css");

/// A whole page: the head with its title and style sheet around the body.
pub fn page(title: &str, body: &Markup) -> String {
    let page = html! {
        (PreEscaped("<!DOCTYPE html>\n"))
        html lang="en" xmlns="http://www.w3.org/1999/xhtml" {
            head {
                // A closed tag, so that the page is XML too.
                (PreEscaped("<meta charset=\"utf-8\"/>"))
                (PreEscaped("<meta name=\"viewport\" content=\"width=device-width, initial-scale=1\"/>"))
                (PreEscaped(concat!("<meta name=\"generator\" content=\"hubgrip ", env!("CARGO_PKG_VERSION"), "\"/>")))
                title { (title) }
                style { (PreEscaped(STYLE)) }
            }
            body { (body) }
        }
    };
    without_control_characters(&page.into_string())
}

/// XML allows no control characters but tab and line ends (XML 1.0, production 2).
fn without_control_characters(page: &str) -> String {
    page.chars()
        .filter(|c| (!c.is_control() || matches!(c, '\n' | '\t')) && !matches!(c, '\u{FFFE}' | '\u{FFFF}'))
        .collect()
}

#[cfg(test)]
mod tests {
    use super::page;
    use crate::report::well_formed::elements;
    use maud::html;

    #[test]
    fn a_page_holds_no_character_that_xml_forbids_and_escapes_its_title() {
        let page = page("a < b \u{1}\u{FFFE}", &html! { p { "x\u{FFFF}y\u{7}\tz" } });
        assert!(!page.contains(['\u{1}', '\u{7}', '\u{FFFE}', '\u{FFFF}']));
        let all = elements(&page).unwrap();
        let text = |name: &str| all.iter().find(|e| e.name == name).map(|e| e.text.clone());
        assert_eq!(text("title").as_deref(), Some("a < b "));
        assert_eq!(text("p").as_deref(), Some("xy\tz"));
    }
}
