//! The JSON Schema of the joint file accepts every example and template, and refuses what is plainly wrong.
//!
//! The checker below knows the words of draft-07 that the schema uses, except `pattern`.

use std::path::{Path, PathBuf};

use hubgrip::joint::read::read_bytes;
use hubgrip::joint::schema::schema;
use hubgrip::joint::template::TEMPLATES;
use hubgrip::material::library::Library;
use serde_json::Value;

/// Why `value` is not what `schema` says; none when it is.
fn wrong(top: &Value, schema: &Value, value: &Value, at: &str) -> Option<String> {
    if let Some(reference) = schema.get("$ref").and_then(Value::as_str) {
        let name = reference.strip_prefix("#/definitions/").expect("a definition");
        return wrong(top, &top["definitions"][name], value, at);
    }
    for part in schema.get("allOf").and_then(Value::as_array).into_iter().flatten() {
        if let Some(found) = wrong(top, part, value, at) {
            return Some(found);
        }
    }
    if let Some(choices) = schema.get("anyOf").and_then(Value::as_array)
        && !choices.iter().any(|choice| wrong(top, choice, value, at).is_none())
    {
        return Some(format!("{at}: none of the shapes"));
    }
    if let Some(kinds) = schema.get("type") {
        let kinds = kinds.as_array().cloned().unwrap_or_else(|| vec![kinds.clone()]);
        let is = |kind: &Value| match kind.as_str().expect("a type") {
            "object" => value.is_object(),
            "array" => value.is_array(),
            "string" => value.is_string(),
            "number" => value.is_number(),
            "integer" => value.is_i64() || value.is_u64(),
            "boolean" => value.is_boolean(),
            other => panic!("type {other} is not known to this check"),
        };
        if !kinds.iter().any(is) {
            return Some(format!("{at}: not of the type"));
        }
    }
    if let Some(words) = schema.get("enum").and_then(Value::as_array)
        && !words.contains(value)
    {
        return Some(format!("{at}: not one of the words"));
    }
    if schema.get("const").is_some_and(|only| only != value) {
        return Some(format!("{at}: not the constant"));
    }
    if let Some(keys) = value.as_object() {
        for needed in schema.get("required").and_then(Value::as_array).into_iter().flatten() {
            if !keys.contains_key(needed.as_str().expect("a key")) {
                return Some(format!("{at}: {needed} is missing"));
            }
        }
        for (key, inner) in keys {
            match schema.get("properties").and_then(|properties| properties.get(key)) {
                Some(property) => {
                    if let Some(found) = wrong(top, property, inner, &format!("{at}.{key}")) {
                        return Some(found);
                    }
                }
                None if schema.get("additionalProperties") == Some(&Value::Bool(false)) => {
                    return Some(format!("{at}: {key} is unknown"));
                }
                None => {}
            }
        }
    }
    if let (Some(items), Some(item)) = (value.as_array(), schema.get("items").filter(|item| item.is_object()))
    {
        for (number, inner) in items.iter().enumerate() {
            if let Some(found) = wrong(top, item, inner, &format!("{at}[{number}]")) {
                return Some(found);
            }
        }
    }
    None
}

fn against_schema(text: &str) -> Option<String> {
    let top: Value = serde_json::from_str(&schema()).expect("the schema is JSON");
    let value: Value = serde_yaml::from_str(text).expect("YAML");
    wrong(&top, &top, &value, "")
}

fn examples() -> Vec<PathBuf> {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("examples");
    let mut files: Vec<PathBuf> = std::fs::read_dir(folder)
        .expect("the examples")
        .map(|entry| entry.expect("an entry").path())
        .filter(|path| path.extension().is_some_and(|extension| extension == "yaml"))
        .collect();
    files.sort();
    files
}

#[test]
fn templates_are_read_without_faults_and_match_the_schema() {
    let library = Library::built_in();
    for template in TEMPLATES {
        let read = read_bytes(template.text.as_bytes(), Path::new(template.kind), &[], &library);
        assert!(read.is_ok(), "{}: {read:?}", template.kind);
        assert_eq!(against_schema(template.text), None, "{}", template.kind);
        assert!(template.text.lines().all(|line| line.len() <= 120), "{}", template.kind);
    }
}

#[test]
fn examples_are_read_without_faults_and_match_the_schema() {
    let library = Library::built_in();
    let files = examples();
    assert!(files.len() >= 6, "{files:?}");
    for file in files {
        let text = std::fs::read_to_string(&file).expect("text");
        let read = read_bytes(text.as_bytes(), &file, &[], &library);
        assert!(read.is_ok(), "{}: {read:?}", file.display());
        assert_eq!(against_schema(&text), None, "{}", file.display());
        assert!(
            text.lines().next().is_some_and(|line| line.contains("nvented demo data")),
            "{}",
            file.display()
        );
    }
}

#[test]
fn what_is_plainly_wrong_does_not_match_the_schema() {
    let right = TEMPLATES[0].text;
    for (from, to, why) in [
        ("outer_diameter: 110 mm", "outer_diametr: 110 mm", "outer_diametr is unknown"),
        ("material: C45+QT", "material: C45+QT\n  rough: Rz 3 um", "rough is unknown"),
        ("joint_file: 1\n", "", "\"joint_file\" is missing"),
        ("diameter: 60 mm", "diameter: 60", "not of the type"),
        ("method: press ", "method: hammer ", "not one of the words"),
        ("joint_file: 1", "joint_file: 2", "not the constant"),
        ("fit: H7/u6", "fit: {hole: H7, shaft: {lowest: 3 um}}", "none of the shapes"),
        ("torque: 500 N.m, axial", "torque: 500 N.m, sped: 10 rpm, axial", "sped is unknown"),
        ("slip_safety: 1.5", "slip_safety:", "not of the type"),
    ] {
        let text = right.replacen(from, to, 1);
        assert_ne!(text, right, "{from}");
        let found = against_schema(&text).unwrap_or_default();
        assert!(found.contains(why), "{to}: {found}");
    }
}

/// YAML takes `true` for no text, and the program reads it like `yes`.
#[test]
fn yes_and_no_may_be_written_as_yaml_has_them() {
    let file = |word: &str| {
        TEMPLATES[0].text.replacen("torque: 500 N.m,", &format!("torque: 500 N.m, reversing: {word},"), 1)
    };
    for (word, meaning) in
        [("yes", true), ("true", true), ("\"true\"", true), ("no", false), ("false", false)]
    {
        let text = file(word);
        assert_ne!(text, TEMPLATES[0].text);
        assert_eq!(against_schema(&text), None, "{word}");
        let joint = read_bytes(text.as_bytes(), Path::new("demo.yaml"), &[], &Library::built_in());
        assert_eq!(joint.map(|joint| joint.duty[0].reversing), Ok(meaning), "{word}");
    }
    for word in ["maybe", "1"] {
        assert!(against_schema(&file(word)).is_some(), "{word}");
    }
}
