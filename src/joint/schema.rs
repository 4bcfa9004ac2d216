//! JSON Schema of the joint file, for editors that complete and check YAML.

use schemars::generate::SchemaSettings;
use serde_json::Value;

use super::file::JointFile;

/// The JSON Schema of the joint file, version 1, draft-07: the newest draft that YAML editors read.
///
/// # Example
/// ```
/// let schema = hubgrip::joint::schema::schema();
/// assert!(schema.contains("\"outer_diameter\""));
/// ```
pub fn schema() -> String {
    let generator = SchemaSettings::draft07().into_generator();
    let mut schema = generator.into_root_schema_for::<JointFile>().to_value();
    if let Some(top) = schema.as_object_mut() {
        top.insert("title".to_owned(), Value::from("hubgrip joint file, version 1"));
    }
    without_null(&mut schema);
    let mut text = serde_json::to_string_pretty(&schema).unwrap_or_default();
    text.push('\n');
    text
}

/// Every key of the joint file by its path, such as `hub.outer_diameter`; `*` stands for the place in a list, as in
/// `duty.*.torque`. The keys of a material written in place are among them.
///
/// # Example
/// ```
/// let keys = hubgrip::joint::schema::keys();
/// assert!(keys.iter().any(|key| key == "hub.outer_diameter"));
/// assert!(keys.iter().any(|key| key == "duty.*.torque"));
/// ```
pub fn keys() -> Vec<String> {
    let generator = SchemaSettings::draft07().into_generator();
    let schema = generator.into_root_schema_for::<JointFile>().to_value();
    let mut keys = Vec::new();
    collect_keys(&schema, &schema, "", DEEPEST_KEY, &mut keys);
    keys.sort();
    keys.dedup();
    keys
}

/// Most sections a key lies within.
const DEEPEST_KEY: usize = 6;

/// The keys below a piece of the schema, through references, choices and lists.
fn collect_keys(root: &Value, piece: &Value, path: &str, depth: usize, keys: &mut Vec<String>) {
    if depth == 0 {
        return;
    }
    if let Some(name) = piece.get("$ref").and_then(Value::as_str).and_then(|name| name.strip_prefix('#'))
        && let Some(found) = root.pointer(name)
    {
        collect_keys(root, found, path, depth - 1, keys);
    }
    for choices in ["allOf", "anyOf", "oneOf"] {
        for choice in piece.get(choices).and_then(Value::as_array).into_iter().flatten() {
            collect_keys(root, choice, path, depth, keys);
        }
    }
    let below = |key: &str| if path.is_empty() { key.to_owned() } else { format!("{path}.{key}") };
    for (key, value) in piece.get("properties").and_then(Value::as_object).into_iter().flatten() {
        keys.push(below(key));
        collect_keys(root, value, &below(key), depth, keys);
    }
    if let Some(items) = piece.get("items") {
        collect_keys(root, items, &below("*"), depth, keys);
    }
}

/// Takes out the null that an optional key allows: a key without a value is refused.
fn without_null(schema: &mut Value) {
    match schema {
        Value::Object(keys) => {
            if let Some(Value::Array(types)) = keys.get_mut("type") {
                types.retain(|kind| kind != "null");
                if let [only] = types.as_slice() {
                    let only = only.clone();
                    keys.insert("type".to_owned(), only);
                }
            }
            if let Some(Value::Array(choices)) = keys.get_mut("anyOf") {
                choices.retain(|choice| choice.get("type").is_none_or(|kind| kind != "null"));
                if let [_] = choices.as_slice()
                    && let Some(only) = keys.remove("anyOf")
                {
                    keys.insert("allOf".to_owned(), only);
                }
            }
            if let Some(Value::Array(values)) = keys.get_mut("enum") {
                values.retain(|value| !value.is_null());
            }
            keys.values_mut().for_each(without_null);
        }
        Value::Array(items) => items.iter_mut().for_each(without_null),
        _ => {}
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::joint::file::SECTIONS;

    fn resolved<'s>(top: &'s Value, schema: &'s Value) -> Vec<&'s Value> {
        if let Some(name) = schema.get("$ref").and_then(Value::as_str) {
            let name = name.trim_start_matches("#/definitions/");
            return resolved(top, &top["definitions"][name]);
        }
        match schema.get("anyOf").or(schema.get("allOf")).and_then(Value::as_array) {
            Some(choices) => choices.iter().flat_map(|choice| resolved(top, choice)).collect(),
            None => match schema.get("items") {
                Some(items) => resolved(top, items),
                None => vec![schema],
            },
        }
    }

    #[test]
    fn the_sections_list_the_keys_of_the_shapes() {
        let top: Value = serde_json::from_str(&schema()).unwrap();
        for (section, keys) in SECTIONS {
            let shapes = resolved(&top, &top["properties"][section]);
            let known = |key: &str| shapes.iter().any(|shape| shape["properties"].get(key).is_some());
            for key in *keys {
                assert!(known(key), "{section}.{key}");
            }
        }
    }

    #[test]
    fn no_key_may_be_null() {
        assert!(!schema().contains("null"));
    }
}
