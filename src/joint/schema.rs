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
                if let [Value::Object(only)] = choices.as_slice() {
                    let only = only.clone();
                    keys.remove("anyOf");
                    for (key, value) in only {
                        keys.entry(key).or_insert(value);
                    }
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
