//! Changes from the command line: `--set KEY=VALUE` for a what-if without editing the file.
//!
//! Keys are dotted, as in `hub.outer_diameter=120mm` or `fit=H7/u6`. A service state is meant by its number
//! from 0 or by its name: `duty.0.torque=1kN.m`, `duty.rated.torque=1kN.m`. A section that is not there yet is
//! made, and so are the states of a file that has none, one after the other; to a list that the file has nothing
//! is added. The value is taken as typed, except that one which begins with a brace, a bracket or a quote is
//! read as YAML: `fit={hole: H7, shaft: s6}`.

use super::grow::tree_of;
use super::tree::{Content, NodeId, Origin, Tree};
use crate::diagnostic::{Diagnostic, did_you_mean};

/// Key and value of `KEY=VALUE`.
///
/// # Errors
/// When there is no `=`, no key before it or no value after it.
///
/// # Example
/// ```
/// let (key, value) = hubgrip::joint::set::split("fit = H7/u6").unwrap();
/// assert_eq!((key.as_str(), value.as_str()), ("fit", "H7/u6"));
/// assert!(hubgrip::joint::set::split("fit").is_err());
/// ```
pub fn split(option: &str) -> Result<(String, String), Box<Diagnostic>> {
    let refused = |what: &str| {
        let fault = Diagnostic::new(format!("--set {option}: {what}"));
        Err(Box::new(
            fault.with_help("write KEY=VALUE, such as --set fit=H7/u6 or --set hub.outer_diameter=120mm"),
        ))
    };
    match option.split_once('=') {
        None => refused("there is no `=`"),
        Some((key, _)) if key.trim().is_empty() => refused("there is no key before the `=`"),
        Some((_, value)) if value.trim().is_empty() => refused("there is no value after the `=`"),
        Some((key, value)) => Ok((key.trim().to_owned(), value.trim().to_owned())),
    }
}

/// Makes the changes in the tree, in order.
pub(crate) fn apply(tree: &mut Tree, set: &[(String, String)]) -> Result<(), Vec<Diagnostic>> {
    let faults: Vec<Diagnostic> = set
        .iter()
        .enumerate()
        .filter_map(|(number, (key, value))| {
            one(tree, Origin::Set(number), key, value)
                .err()
                .map(|fault| Diagnostic { message: format!("--set {key}: {}", fault.message), ..*fault })
        })
        .collect();
    if faults.is_empty() { Ok(()) } else { Err(faults) }
}

fn one(tree: &mut Tree, origin: Origin, key: &str, value: &str) -> Result<(), Box<Diagnostic>> {
    let mut node = tree.root();
    let mut rest = key.trim();
    if rest.ends_with('.') {
        let fault = Diagnostic::new("the key ends with a dot");
        return Err(Box::new(fault.with_help("take the dot out, or write the key that belongs behind it")));
    }
    while !rest.is_empty() {
        (node, rest) = step(tree, origin, node, rest)?;
    }
    put(tree, node, value.trim(), origin)
}

/// One step along the key: the value it leads to, and the keys that are left.
fn step<'k>(
    tree: &mut Tree,
    origin: Origin,
    node: NodeId,
    rest: &'k str,
) -> Result<(NodeId, &'k str), Box<Diagnostic>> {
    let (first, left) = rest.split_once('.').unwrap_or((rest, ""));
    match tree.content(node) {
        Content::Null if tree.key_path(node) == "duty" => state(tree, origin, node, rest),
        Content::List(_) => state(tree, origin, node, rest),
        Content::Null | Content::Map(_) if first.is_empty() => {
            let fault = Diagnostic::new("nothing stands before a dot of the key");
            Err(Box::new(fault.with_help("write keys with one dot between them, such as hub.outer_diameter")))
        }
        Content::Null | Content::Map(_) => {
            let found = tree.get(node, first);
            Ok((found.unwrap_or_else(|| tree.append(node, first, Content::Null, origin)), left))
        }
        Content::Scalar(text) => {
            let key = tree.key_path(node);
            let fault =
                Diagnostic::new(format!("`{key}` is one text in the file, `{text}`, and has no keys"));
            Err(Box::new(fault.with_help(format!("set `{key}` as a whole"))))
        }
    }
}

/// A service state by number or by name.
fn state<'k>(
    tree: &mut Tree,
    origin: Origin,
    list: NodeId,
    rest: &'k str,
) -> Result<(NodeId, &'k str), Box<Diagnostic>> {
    let items = match tree.content(list) {
        Content::List(items) => items.clone(),
        _ => Vec::new(),
    };
    let (first, left) = rest.split_once('.').unwrap_or((rest, ""));
    if let Ok(number) = first.parse::<usize>() {
        if let Some(&item) = items.get(number) {
            return Ok((item, left));
        }
        let of_the_file = items.iter().any(|&item| tree.origin(item) == Origin::File);
        if number == items.len() && !of_the_file {
            return Ok((tree.push(list, Content::Null, origin), left));
        }
        return Err(Box::new(no_such_number(tree, list, &items, number)));
    }
    let key = tree.key_path(list);
    if key != "duty" {
        let fault = Diagnostic::new(format!("`{key}` is a list and has no item `{first}`"));
        return Err(Box::new(fault.with_help("name the item by its number, counted from 0")));
    }
    let names: Vec<(String, NodeId)> = items
        .iter()
        .enumerate()
        .map(|(number, &item)| (state_name(tree, item).unwrap_or_else(|| unnamed(number)), item))
        .collect();
    let named = names.iter().find_map(|(name, item)| {
        let after = rest.strip_prefix(name.as_str())?;
        if after.is_empty() { Some((*item, "")) } else { Some((*item, after.strip_prefix('.')?)) }
    });
    if let Some(found) = named {
        return Ok(found);
    }
    if items.is_empty() {
        let item = tree.push(list, Content::Null, origin);
        tree.append(item, "state", Content::Scalar(first.to_owned()), origin);
        return Ok((item, left));
    }
    let fault = Diagnostic::new(format!("there is no state `{first}`"));
    let known: Vec<&str> = names.iter().map(|(name, _)| name.as_str()).collect();
    Err(Box::new(match did_you_mean(first, known.iter().copied()) {
        Some(found) => fault.with_help(format!("did you mean `{found}`?")),
        None => fault.with_help(format!("the states are {}", known.join(", "))),
    }))
}

/// A number that no item has: the items there are, counted from 0.
fn no_such_number(tree: &Tree, list: NodeId, items: &[NodeId], number: usize) -> Diagnostic {
    let key = tree.key_path(list);
    if key != "duty" {
        let last = items.len().saturating_sub(1);
        return Diagnostic::new(format!("`{key}` has no item {number}")).with_help(format!(
            "numbers count from 0: the last is {last}; set `{key}` as a whole to add one"
        ));
    }
    let states: Vec<String> = items
        .iter()
        .enumerate()
        .map(|(number, &item)| {
            let name = state_name(tree, item).unwrap_or_else(|| unnamed(number));
            format!("{number} (`{name}`)")
        })
        .collect();
    let help = match states.as_slice() {
        [] => "numbers count from 0, and there is no state yet: begin with 0".to_owned(),
        [only] => format!("numbers count from 0: the only state is {only}"),
        all => format!("numbers count from 0: the states are {}", all.join(", ")),
    };
    Diagnostic::new(format!("there is no state {number}")).with_help(help)
}

/// What a state without a name is called wherever it is shown: counted from 1.
fn unnamed(number: usize) -> String {
    format!("state {}", number + 1)
}

fn state_name(tree: &Tree, item: NodeId) -> Option<String> {
    match tree.content(tree.get(item, "state")?) {
        Content::Scalar(name) => Some(name.trim().to_owned()),
        _ => None,
    }
}

fn put(tree: &mut Tree, node: NodeId, value: &str, origin: Origin) -> Result<(), Box<Diagnostic>> {
    if value.starts_with(['{', '[', '"', '\'']) {
        let given = tree_of(value).map_err(|fault| Diagnostic {
            place: None,
            line_text: None,
            width: 1,
            ..*fault
        })?;
        graft(tree, node, &given, given.root(), origin);
    } else {
        tree.replace(node, Content::Scalar(value.to_owned()), origin);
    }
    Ok(())
}

/// Copies a value of another tree to `node`.
fn graft(tree: &mut Tree, node: NodeId, other: &Tree, from: NodeId, origin: Origin) {
    tree.replace(node, Content::Null, origin);
    match other.content(from) {
        Content::Null => {}
        Content::Scalar(text) => tree.replace(node, Content::Scalar(text.clone()), origin),
        Content::List(items) => {
            tree.replace(node, Content::List(Vec::new()), origin);
            for &item in items {
                let copy = tree.push(node, Content::Null, origin);
                graft(tree, copy, other, item, origin);
            }
        }
        Content::Map(entries) => {
            tree.replace(node, Content::Map(Vec::new()), origin);
            for entry in entries {
                let copy = tree.append(node, &entry.key, Content::Null, origin);
                graft(tree, copy, other, entry.value, origin);
            }
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    const TEXT: &str = "\
fit: H7/s6
hub: {material: C45+N, outer_diameter: 110 mm}
duty:
  - {state: rated, torque: 900 N.m}
  - {state: cold start}
";

    fn after(text: &str, set: &[(&str, &str)]) -> Result<Tree, Vec<Diagnostic>> {
        let mut tree = tree_of(text).unwrap();
        let set: Vec<(String, String)> =
            set.iter().map(|(key, value)| ((*key).to_owned(), (*value).to_owned())).collect();
        apply(&mut tree, &set).map(|()| tree)
    }

    fn scalar(tree: &Tree, path: &str) -> Option<String> {
        let mut node = tree.root();
        for step in path.split('.') {
            node = match tree.content(node) {
                Content::List(items) => *items.get(step.parse::<usize>().ok()?)?,
                _ => tree.get(node, step)?,
            };
        }
        match tree.content(node) {
            Content::Scalar(text) => Some(text.clone()),
            _ => None,
        }
    }

    #[test]
    fn values_are_replaced_and_added() {
        let tree =
            after(TEXT, &[("fit", "H7/u6"), ("hub.roughness", "Rz 1.60 um"), ("require.slip_safety", "2.0")])
                .unwrap();
        assert_eq!(scalar(&tree, "fit").as_deref(), Some("H7/u6"));
        assert_eq!(scalar(&tree, "hub.roughness").as_deref(), Some("Rz 1.60 um"));
        assert_eq!(scalar(&tree, "require.slip_safety").as_deref(), Some("2.0"));
        assert_eq!(scalar(&tree, "hub.material").as_deref(), Some("C45+N"));
    }

    #[test]
    fn states_go_by_number_and_by_name() {
        let tree = after(TEXT, &[("duty.0.torque", "1 kN.m"), ("duty.cold start.torque", "2 kN.m")]).unwrap();
        assert_eq!(scalar(&tree, "duty.0.torque").as_deref(), Some("1 kN.m"));
        assert_eq!(scalar(&tree, "duty.1.torque").as_deref(), Some("2 kN.m"));
        let faults = after(TEXT, &[("duty.ratde.torque", "1 kN.m")]).unwrap_err();
        assert_eq!(faults[0].message, "--set duty.ratde.torque: there is no state `ratde`");
        assert_eq!(faults[0].help.as_deref(), Some("did you mean `rated`?"));
        let faults = after(TEXT, &[("duty.7.torque", "1 kN.m")]).unwrap_err();
        assert_eq!(faults[0].message, "--set duty.7.torque: there is no state 7");
        assert_eq!(
            faults[0].help.as_deref(),
            Some("numbers count from 0: the states are 0 (`rated`), 1 (`cold start`)")
        );
    }

    #[test]
    fn a_list_of_the_file_gets_no_item_by_its_number() {
        let refused = |text: &str, key: &str| {
            let faults = after(text, &[(key, "10 N.m")]).unwrap_err();
            (faults[0].message.clone(), faults[0].help.clone().unwrap_or_default())
        };
        let one = "duty: [{state: rated, torque: 900 N.m}]";
        let (message, help) = refused(one, "duty.1.torque");
        assert_eq!(message, "--set duty.1.torque: there is no state 1");
        assert_eq!(help, "numbers count from 0: the only state is 0 (`rated`)");
        let (message, help) = refused("rings: [{name: core}]", "rings.core.material");
        assert_eq!(message, "--set rings.core.material: `rings` is a list and has no item `core`");
        assert_eq!(help, "name the item by its number, counted from 0");
        let (_, help) = refused("duty: [{torque: 900 N.m}]", "duty.1.torque");
        assert_eq!(help, "numbers count from 0: the only state is 0 (`state 1`)");
        let (message, help) = refused("fits: [H7/s6, H7/s6]", "fits.2");
        assert_eq!(message, "--set fits.2: `fits` has no item 2");
        assert_eq!(help, "numbers count from 0: the last is 1; set `fits` as a whole to add one");
    }

    #[test]
    fn a_state_without_a_name_goes_by_what_it_is_called_in_the_output() {
        let tree =
            after("duty: [{torque: 900 N.m}, {torque: 800 N.m}]", &[("duty.state 2.torque", "1 kN.m")])
                .unwrap();
        assert_eq!(scalar(&tree, "duty.1.torque").as_deref(), Some("1 kN.m"));
        assert_eq!(scalar(&tree, "duty.0.torque").as_deref(), Some("900 N.m"));
    }

    #[test]
    fn states_of_a_file_without_any_are_made_in_their_order() {
        let tree =
            after("fit: H7/s6\n", &[("duty.0.torque", "1 kN.m"), ("duty.1.torque", "2 kN.m")]).unwrap();
        assert_eq!(scalar(&tree, "duty.1.torque").as_deref(), Some("2 kN.m"));
        let faults = after("fit: H7/s6\n", &[("duty.1.torque", "1 kN.m")]).unwrap_err();
        assert_eq!(
            faults[0].help.as_deref(),
            Some("numbers count from 0, and there is no state yet: begin with 0")
        );
    }

    #[test]
    fn a_duty_that_is_not_there_is_made() {
        for key in ["duty.0.torque", "duty.rated.torque"] {
            let tree = after("fit: H7/s6\n", &[(key, "1 kN.m")]).unwrap();
            assert_eq!(scalar(&tree, "duty.0.torque").as_deref(), Some("1 kN.m"), "{key}");
        }
    }

    #[test]
    fn a_text_has_no_keys() {
        let faults = after(TEXT, &[("fit.hole", "H8")]).unwrap_err();
        assert_eq!(
            faults[0].message,
            "--set fit.hole: `fit` is one text in the file, `H7/s6`, and has no keys"
        );
        assert_eq!(faults[0].help.as_deref(), Some("set `fit` as a whole"));
    }

    #[test]
    fn braces_are_read_as_yaml() {
        let tree = after(TEXT, &[("fit", "{hole: H7, shaft: {lower: 53 um, upper: 72 um}}")]).unwrap();
        assert_eq!(scalar(&tree, "fit.shaft.upper").as_deref(), Some("72 um"));
        assert!(after(TEXT, &[("fit", "{hole: H7")]).is_err());
    }
}
