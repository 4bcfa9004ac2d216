//! The head of a table: which column is which key, and in which unit its numbers are.

use crate::diagnostic::{Diagnostic, Place, did_you_mean};
use crate::joint::schema;

/// One column of the table.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(super) struct Column {
    /// The head as it stands in the table.
    pub(super) head: String,
    /// Key of the joint file; none when the column is only carried along.
    pub(super) key: Option<String>,
    /// What is written before a plain number of the column, such as `Rz `.
    pub(super) before: String,
    /// The unit of a plain number of the column; empty when there is none.
    pub(super) unit: String,
}

/// The columns of a head.
///
/// `carried` are heads that are no keys; `set` are the keys that are the same for every row.
///
/// # Errors
/// Every head that is not understood.
pub(super) fn columns(
    heads: &[String],
    carried: &[String],
    set: &[(String, String)],
) -> Result<Vec<Column>, Vec<Diagnostic>> {
    let keys = schema::keys();
    let mut faults = Vec::new();
    if let [only] = heads
        && let Some(separator) = [';', '\t'].into_iter().find(|separator| only.contains(*separator))
    {
        return Err(vec![other_separator(only, separator)]);
    }
    let first = heads.first().map_or("", |head| head.trim());
    if first.starts_with("joint_file:") || (heads.len() == 1 && first.starts_with('#')) {
        let fault = Diagnostic::new("this is a joint file or a comment, not the head of a table");
        let help = "the table comes first, the joint file as base: hubgrip batch TABLE.csv --base JOINT.yaml";
        return Err(vec![Diagnostic { place: Some(Place { line: 1, column: 1 }), ..fault.with_help(help) }]);
    }
    if heads.iter().any(|head| head.contains(['\0', '\u{fffd}'])) {
        let fault = Diagnostic::new("the head of the table is not text in UTF-8");
        let fault = fault.with_help("save the table as comma-separated values in UTF-8");
        return Err(vec![Diagnostic { place: Some(Place { line: 1, column: 1 }), ..fault }]);
    }
    let mut columns: Vec<Column> = Vec::new();
    for head in heads {
        let mut column = split(head);
        let is_carried = carried.iter().any(|name| name.trim() == head.trim());
        let fault = if head.trim().is_empty() {
            Some(Diagnostic::new(format!("column {} has no name", columns.len() + 1)))
        } else if columns.iter().any(|known| same(known, &column)) {
            Some(Diagnostic::new(format!("the column `{}` stands twice", head.trim())))
        } else if is_carried {
            column.key = None;
            None
        } else {
            refused(&column, &keys, set)
        };
        faults.extend(fault.map(|fault| Diagnostic { place: Some(Place { line: 1, column: 1 }), ..fault }));
        columns.push(column);
    }
    for name in carried {
        if !heads.iter().any(|head| head.trim() == name.trim()) {
            faults.push(Diagnostic::new(format!("--keep {name}: there is no such column")));
        }
    }
    if faults.is_empty() { Ok(columns) } else { Err(faults) }
}

fn same(one: &Column, other: &Column) -> bool {
    match (&one.key, &other.key) {
        (Some(one), Some(other)) => one == other,
        _ => one.head.trim() == other.head.trim(),
    }
}

/// `hub.outer_diameter (mm)` is a key with a unit, `hub.roughness (Rz um)` one with a symbol as well.
fn split(head: &str) -> Column {
    let trimmed = head.trim();
    let (key, given) = match trimmed.strip_suffix(')').and_then(|text| text.rsplit_once('(')) {
        Some((key, given)) => (key.trim(), given.trim()),
        None => (trimmed, ""),
    };
    let symbol = ["Rz", "Ra"].into_iter().find(|symbol| {
        given.get(..symbol.len()).is_some_and(|start| start.eq_ignore_ascii_case(symbol))
            && given.get(symbol.len()..).is_some_and(|rest| rest.starts_with([' ', ',']))
    });
    let (before, unit) = match symbol {
        Some(symbol) => (format!("{symbol} "), given[symbol.len()..].trim_start_matches([' ', ','])),
        None => (String::new(), given),
    };
    Column { head: head.to_owned(), key: Some(key.to_owned()), before, unit: unit.to_owned() }
}

fn refused(column: &Column, keys: &[String], set: &[(String, String)]) -> Option<Diagnostic> {
    let key = column.key.as_deref().unwrap_or("");
    if let Some((given, _)) = set.iter().find(|(given, _)| given == key) {
        let fault = Diagnostic::new(format!("`{given}` is a column and set on the command line as well"));
        return Some(fault.with_help("take one of the two away"));
    }
    if keys.iter().any(|known| matches(known, key)) {
        return None;
    }
    let fault = Diagnostic::new(format!("the column `{}` is no key of a joint file", column.head.trim()));
    let carry = format!("--keep \"{}\" carries a column along unread", column.head.trim());
    let pattern = generalised(key);
    Some(match did_you_mean(&pattern, keys.iter().map(String::as_str)) {
        Some(near) => fault.with_help(format!("did you mean `{near}`? {carry}")),
        None => fault.with_help(format!("keys are dotted, such as hub.outer_diameter; {carry}")),
    })
}

/// Whether a key of the table is that of the joint file; a star is one number or name.
fn matches(known: &str, key: &str) -> bool {
    let (known, key): (Vec<&str>, Vec<&str>) = (known.split('.').collect(), key.split('.').collect());
    known.len() == key.len()
        && known.iter().zip(&key).all(|(known, key)| known == key || (*known == "*" && !key.is_empty()))
}

/// The key with a star for the state, for a comparison with the known ones.
fn generalised(key: &str) -> String {
    let mut parts: Vec<&str> = key.split('.').collect();
    if parts.len() == 3 && parts.first() == Some(&"duty") {
        parts[1] = "*";
    }
    parts.join(".")
}

fn other_separator(head: &str, separator: char) -> Diagnostic {
    let name = if separator == '\t' { "a tab" } else { "`;`" };
    let shown: String = head.chars().take(60).filter(|c| !c.is_control()).collect();
    let fault = Diagnostic::new(format!("the separator is {name}, a table has commas: {shown}"));
    Diagnostic { place: Some(Place { line: 1, column: 1 }), ..fault }
        .with_help("save the table as comma-separated values with decimal points")
}

#[cfg(test)]
mod tests {
    use super::*;

    fn heads(heads: &[&str]) -> Result<Vec<Column>, Vec<Diagnostic>> {
        columns(&heads.iter().map(|head| (*head).to_owned()).collect::<Vec<_>>(), &["id".to_owned()], &[])
    }

    #[test]
    fn keys_units_and_symbols_are_told_apart() {
        let found =
            heads(&["id", "diameter (mm)", "hub.roughness (Rz um)", "duty.rated.torque", " fit "]).unwrap();
        let of = |index: usize| {
            (found[index].key.as_deref(), found[index].before.as_str(), found[index].unit.as_str())
        };
        assert_eq!(of(0), (None, "", ""));
        assert_eq!(of(1), (Some("diameter"), "", "mm"));
        assert_eq!(of(2), (Some("hub.roughness"), "Rz ", "um"));
        assert_eq!(of(3), (Some("duty.rated.torque"), "", ""));
        assert_eq!(of(4), (Some("fit"), "", ""));
    }

    #[test]
    fn what_is_not_understood_is_told_at_once() {
        let faults = heads(&["id", "hub.outer_diamter (mm)", "", "fit", "fit", "duty.0.torqe"]).unwrap_err();
        let messages: Vec<&str> = faults.iter().map(|fault| fault.message.as_str()).collect();
        assert_eq!(messages.len(), 4, "{messages:?}");
        assert!(faults[0].help.as_ref().unwrap().contains("did you mean `hub.outer_diameter`?"));
        assert!(messages[1].contains("column 3 has no name"));
        assert!(messages[2].contains("`fit` stands twice"));
        assert!(faults[3].help.as_ref().unwrap().contains("`duty.*.torque`"));
        let faults = columns(&["diameter;fit".to_owned()], &[], &[]).unwrap_err();
        assert!(faults[0].message.contains("the separator is `;`"));
    }

    #[test]
    fn a_key_has_one_source() {
        let set = [("fit".to_owned(), "H7/s6".to_owned())];
        let faults = columns(&["fit".to_owned()], &[], &set).unwrap_err();
        assert!(faults[0].message.contains("set on the command line as well"));
    }
}
