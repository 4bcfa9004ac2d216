//! From the text of a joint file to a validated joint, or to everything that is wrong with it.
//!
//! 1. refused at once: what is too large, not text, empty or not YAML;
//! 2. the tree of values, with the changes from the command line made in it;
//! 3. the keys, by serde;
//! 4. the joint put together: texts with units read, rules checked, defaults taken.
//!
//! A fault in steps 3 and 4 does not stop the reading, so one run tells them all.

use std::path::Path;

use serde::Deserialize;
use sha2::{Digest, Sha256};

use super::decode::Value;
use super::diagnose::Faults;
use super::draft::Draft;
use super::file::{JointFile, VERSION};
use super::grow::tree_of;
use super::tree::{Content, Origin, Tree};
use super::{Joint, place, set, validate};
use crate::diagnostic::Diagnostic;
use crate::material::library::Library;

/// Largest joint file that is read, bytes.
pub const LARGEST: usize = 1 << 20;

/// The joint that a text describes, with changes made in it.
///
/// `file` is what messages call the text; the changes are keys with values as [`set::split`] gives them.
///
/// # Errors
/// Everything that is wrong, in the order of the file, each with its place where it has one.
pub fn read(
    text: &str,
    file: &Path,
    set: &[(String, String)],
    library: &Library,
) -> Result<Joint, Vec<Diagnostic>> {
    read_as(text, file, set, library, FitKey::Required)
}

/// Whether a joint file must have the key `fit`.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) enum FitKey {
    Required,
    Optional,
}

fn read_as(
    text: &str,
    file: &Path,
    set: &[(String, String)],
    library: &Library,
    fit: FitKey,
) -> Result<Joint, Vec<Diagnostic>> {
    let fault = |fault: Box<Diagnostic>| vec![fault.in_file(file)];
    refuse_unreadable(text.as_bytes()).map_err(fault)?;
    let plain = text.strip_prefix('\u{feff}').unwrap_or(text);
    let mut tree = tree_of(plain).map_err(fault)?;
    refuse_other_shapes(plain, &tree).map_err(fault)?;
    set::apply(&mut tree, set)?;
    let faults = Faults::default();
    match understood(&tree, &faults, library, fit) {
        Some(joint) if faults.is_empty() => {
            Ok(Joint { set: set.to_vec(), digest: digest(text, set), ..joint })
        }
        _ => Err(faults.told(plain, &tree, file, set)),
    }
}

/// As [`read`], from bytes that need not be text.
///
/// # Errors
/// As [`read`]; bytes that are not UTF-8 are told with their place.
pub fn read_bytes(
    bytes: &[u8],
    file: &Path,
    set: &[(String, String)],
    library: &Library,
) -> Result<Joint, Vec<Diagnostic>> {
    let text = text_of(bytes).map_err(|fault| vec![fault.in_file(file)])?;
    read(text, file, set, library)
}

/// The text of a joint file that other values will complete: UTF-8 and YAML with keys, nothing else is asked yet.
///
/// # Errors
/// What [`read_bytes`] would say before it looks at any key.
pub fn text_to_complete(bytes: &[u8], file: &Path) -> Result<String, Vec<Diagnostic>> {
    let fault = |fault: Box<Diagnostic>| vec![fault.in_file(file)];
    let text = text_of(bytes).map_err(fault)?;
    let plain = text.strip_prefix('\u{feff}').unwrap_or(text);
    let tree = tree_of(plain).map_err(fault)?;
    refuse_other_shapes(plain, &tree).map_err(fault)?;
    Ok(text.to_owned())
}

/// As [`read_bytes`], but the key `fit` may be missing: the joint then has no fit, for the one that chooses it.
///
/// # Errors
/// As [`read_bytes`].
///
/// # Example
/// ```
/// use std::path::Path;
/// use hubgrip::joint::read;
/// use hubgrip::material::library::Library;
///
/// let text = "\
/// joint_file: 1
/// diameter: 60 mm
/// length: 70 mm
/// shaft: {material: C45+N}
/// hub: {material: EN-GJL-250, outer_diameter: 110 mm}
/// ";
/// let (file, library) = (Path::new("joint.yaml"), Library::built_in());
/// let joint = read::read_without_fit(text.as_bytes(), file, &[], &library).unwrap();
/// assert!(joint.fits.is_empty());
/// assert!(read::read(text, file, &[], &library).is_err());
/// ```
pub fn read_without_fit(
    bytes: &[u8],
    file: &Path,
    set: &[(String, String)],
    library: &Library,
) -> Result<Joint, Vec<Diagnostic>> {
    let text = text_of(bytes).map_err(|fault| vec![fault.in_file(file)])?;
    read_as(text, file, set, library, FitKey::Optional)
}

/// A fault of a joint that was read well, at the key that it is about: dotted, such as `require.allow` or
/// `hub.steps`.
///
/// The fault stays as it is where the key is not in the file; one that the changes made is named in the message.
///
/// # Example
/// ```
/// use hubgrip::diagnostic::Diagnostic;
/// use hubgrip::joint::read::at_key;
///
/// let text = b"joint_file: 1\nrequire:\n  allow: plastic\n";
/// let fault = at_key(Diagnostic::new("not here"), text, &[], "require.allow");
/// assert_eq!(fault.place.map(|place| (place.line, place.column)), Some((3, 3)));
/// ```
pub fn at_key(fault: Diagnostic, text: &[u8], set: &[(String, String)], key: &str) -> Diagnostic {
    let Ok(text) = text_of(text) else { return fault };
    let plain = text.strip_prefix('\u{feff}').unwrap_or(text);
    let Ok(mut tree) = tree_of(plain) else { return fault };
    if set::apply(&mut tree, set).is_err() {
        return fault;
    }
    let found = key.split('.').try_fold(tree.root(), |node, key| tree.get(node, key));
    let Some(node) = found else { return fault };
    if let Origin::Set(number) = tree.origin(node) {
        let named = set.get(number).map_or(key, |(key, _)| key.as_str());
        return Diagnostic { message: format!("--set {named}: {}", fault.message), ..fault };
    }
    match place::of_node(plain, &tree, node, place::Part::Key) {
        Some(span) => fault.at(plain, span.place, span.width),
        None => fault,
    }
}

fn understood(tree: &Tree, faults: &Faults, library: &Library, fit: FitKey) -> Option<Joint> {
    let root = tree.root();
    match JointFile::deserialize(Value { tree, node: root, faults }) {
        Ok(file) => {
            let mut draft = Draft::new(tree, faults, library);
            let version = draft.required(root, "joint_file", &VERSION.to_string(), file.joint_file.as_ref());
            if let Some(version) = version
                && draft.value(version).is_none()
            {
                return None;
            }
            validate::joint(&mut draft, &file, fit)
        }
        Err(refusal) => {
            faults.add(refusal.fault(root));
            None
        }
    }
}

fn text_of(bytes: &[u8]) -> Result<&str, Box<Diagnostic>> {
    refuse_unreadable(bytes)?;
    std::str::from_utf8(bytes).map_err(|error| {
        let good = bytes.get(..error.valid_up_to()).and_then(|good| std::str::from_utf8(good).ok());
        let fault = Diagnostic::new("a character here is not UTF-8")
            .with_help("save the file as UTF-8; an editor calls this the encoding");
        Box::new(match good {
            Some(good) => fault.at(good, place::of_byte(good, good.len()), 1),
            None => fault,
        })
    })
}

fn refuse_unreadable(bytes: &[u8]) -> Result<(), Box<Diagnostic>> {
    let refused = |message: String, help: &str| Err(Box::new(Diagnostic::new(message).with_help(help)));
    if bytes.len() > LARGEST {
        let mebibytes = bytes.len() as f64 / LARGEST as f64;
        let message = format!("the file has {mebibytes:.1} MiB, a joint file has at most 1 MiB");
        return refused(message, "this looks like another file");
    }
    if utf16(bytes) {
        let help = "save it as UTF-8; an editor calls this the encoding";
        return refused("the file looks like UTF-16, and a joint file is in UTF-8".to_owned(), help);
    }
    if bytes.contains(&0) {
        let help = "a joint file is plain text in UTF-8; `hubgrip new` writes one to start from";
        return refused("this is not a text file: it holds NUL bytes".to_owned(), help);
    }
    Ok(())
}

/// Whether the bytes begin with the mark of UTF-16, or with plain letters of two bytes each.
fn utf16(bytes: &[u8]) -> bool {
    match bytes {
        [0xff, 0xfe, ..] | [0xfe, 0xff, ..] => true,
        [first, second, third, fourth, ..] => {
            let letters = |high: &[u8], low: &[u8]| {
                high.iter().all(|byte| *byte == 0) && low.iter().all(|byte| matches!(byte, b'\t'..=b'~'))
            };
            letters(&[*first, *third], &[*second, *fourth]) || letters(&[*second, *fourth], &[*first, *third])
        }
        _ => false,
    }
}

fn refuse_other_shapes(text: &str, tree: &Tree) -> Result<(), Box<Diagnostic>> {
    let (message, help) = match tree.content(tree.root()) {
        Content::Map(_) => return Ok(()),
        Content::Null => ("the joint file is empty", "write one to start from with `hubgrip new`"),
        Content::List(_) => (
            "a joint file holds keys with values, this is a list",
            "write each key at the beginning of a line, such as `diameter: 60 mm`",
        ),
        Content::Scalar(_) => (
            "a joint file holds keys with values, this is one text",
            "write `key: value` with a blank after the colon, such as `diameter: 60 mm`",
        ),
    };
    let fault = Diagnostic::new(message).with_help(help);
    Err(Box::new(match place::of_node(text, tree, tree.root(), place::Part::Value) {
        Some(span) => fault.at(text, span.place, span.width),
        None => fault,
    }))
}

/// SHA-256 of the text as it is in the file; the changes follow it, each on a line of its own.
fn digest(text: &str, set: &[(String, String)]) -> String {
    let mut hash = Sha256::new();
    hash.update(text.as_bytes());
    for (key, value) in set {
        hash.update(format!("\n--set {key}={value}").as_bytes());
    }
    hash.finalize().iter().map(|byte| format!("{byte:02x}")).collect()
}
