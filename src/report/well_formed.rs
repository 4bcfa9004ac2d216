//! A reader of XML that is just strict enough to tell whether a page is well-formed, for the tests.

/// An element as met: its name, its attributes, and the text directly inside.
#[derive(Debug, Clone, PartialEq)]
pub(crate) struct Element {
    pub name: String,
    pub attributes: Vec<(String, String)>,
    pub text: String,
    /// Index of the element around it.
    pub parent: Option<usize>,
}

impl Element {
    pub(crate) fn attribute(&self, name: &str) -> Option<&str> {
        self.attributes.iter().find(|(key, _)| key == name).map(|(_, value)| value.as_str())
    }

    pub(crate) fn number(&self, name: &str) -> f64 {
        let text = self.attribute(name).unwrap_or_else(|| panic!("{} has no {name}", self.name));
        text.parse().unwrap_or_else(|_| panic!("{} {name}={text}", self.name))
    }
}

/// All elements in document order.
///
/// Checked after XML 1.0 (5th edition): matching tags, one root, quoted and unrepeated attributes, no bare `<`
/// or `&`, no entity but the five of the standard and character references, no control characters.
pub(crate) fn elements(page: &str) -> Result<Vec<Element>, String> {
    let mut rest = page.strip_prefix("<!DOCTYPE html>").unwrap_or(page).trim();
    let mut found: Vec<Element> = Vec::new();
    let mut open: Vec<usize> = Vec::new();
    if let Some(c) = page.chars().find(|c| c.is_control() && !matches!(c, '\n' | '\t' | '\r')) {
        return Err(format!("control character {c:?}"));
    }
    while !rest.is_empty() {
        let Some(text) = rest.strip_prefix('<') else {
            let end = rest.find('<').unwrap_or(rest.len());
            let text = unescaped(&rest[..end])?;
            match open.last() {
                Some(index) => found[*index].text.push_str(&text),
                None if text.trim().is_empty() => {}
                None => return Err(format!("text outside of the root: {text}")),
            }
            rest = &rest[end..];
            continue;
        };
        let end = text.find('>').ok_or("a tag does not end")?;
        let tag = &text[..end];
        rest = &text[end + 1..];
        if let Some(name) = tag.strip_prefix('/') {
            let index = open.pop().ok_or(format!("</{name}> closes nothing"))?;
            if found[index].name != name {
                return Err(format!("<{}> is closed by </{name}>", found[index].name));
            }
            continue;
        }
        if open.is_empty() && !found.is_empty() {
            return Err(format!("a second root: <{tag}>"));
        }
        let closed = tag.ends_with('/');
        let (name, attributes) = tag_parts(tag.trim_end_matches('/'))?;
        found.push(Element { name, attributes, text: String::new(), parent: open.last().copied() });
        if !closed {
            open.push(found.len() - 1);
        }
    }
    match open.last() {
        Some(index) => Err(format!("<{}> is never closed", found[*index].name)),
        None => Ok(found),
    }
}

fn tag_parts(tag: &str) -> Result<(String, Vec<(String, String)>), String> {
    let (name, mut rest) = tag.split_once(char::is_whitespace).unwrap_or((tag, ""));
    if !name.starts_with(|c: char| c.is_ascii_alphabetic()) {
        return Err(format!("bad name of an element: <{tag}>"));
    }
    let mut attributes: Vec<(String, String)> = Vec::new();
    while !rest.trim().is_empty() {
        let (key, after) =
            rest.trim_start().split_once("=\"").ok_or(format!("attribute without value in <{tag}>"))?;
        let (value, after) = after.split_once('"').ok_or(format!("open quote in <{tag}>"))?;
        if value.contains('<') {
            return Err(format!("bare < in <{tag}>"));
        }
        if attributes.iter().any(|(other, _)| other == key) {
            return Err(format!("{key} twice in <{tag}>"));
        }
        attributes.push((key.to_owned(), unescaped(value)?));
        rest = after;
    }
    Ok((name.to_owned(), attributes))
}

fn unescaped(text: &str) -> Result<String, String> {
    let mut plain = String::new();
    let mut parts = text.split('&');
    plain.push_str(parts.next().unwrap_or(""));
    for part in parts {
        let (entity, after) = part.split_once(';').ok_or(format!("bare & before {part}"))?;
        plain.push(match entity {
            "amp" => '&',
            "lt" => '<',
            "gt" => '>',
            "quot" => '"',
            "apos" | "#39" => '\'',
            _ => return Err(format!("unknown entity &{entity};")),
        });
        plain.push_str(after);
    }
    Ok(plain)
}

#[test]
fn faults_are_found() {
    for fault in [
        "<a><b></a></b>",
        "<a>",
        "<a/><b/>",
        "<a x=\"1\" x=\"2\"/>",
        "<a x=1/>",
        "<a>&nbsp;</a>",
        "<a> & </a>",
        "<a>\u{1}</a>",
    ] {
        assert!(elements(fault).is_err(), "{fault}");
    }
    let good = elements("<!DOCTYPE html>\n<a x=\"1 &lt; 2\">t<b/>u</a>").unwrap();
    assert_eq!((good[0].attribute("x"), good[0].text.as_str()), (Some("1 < 2"), "tu"));
    assert_eq!(good[1].parent, Some(0));
}
