//! The library of materials: the records built in and the user's folders.

mod folders;
mod lookup;

use std::fmt;
use std::path::{Path, PathBuf};
use std::sync::{Arc, OnceLock};

pub use folders::user_folders;
pub use lookup::NotFound;

use super::catalogue::{ENTRIES, Entry};
use super::{Material, Origin, yaml};
use crate::diagnostic::Diagnostic;
use lookup::plain;

/// The materials that can be named in a joint file.
///
/// A built-in record is read when it is first asked for; the user's files are read when the library is opened.
///
/// # Example
/// ```
/// use hubgrip::material::library::Library;
/// let library = Library::built_in();
/// assert_eq!(library.find("GG25")?.id, "EN-GJL-250");
/// assert_eq!(library.find("aisi 4140")?.id, "42CrMo4+QT");
/// let error = library.find("1.0503").unwrap_err();
/// assert_eq!(error.to_string(), "`1.0503` may be C45+N or C45+QT");
/// # Ok::<(), hubgrip::material::library::NotFound>(())
/// ```
#[derive(Debug)]
pub struct Library {
    user: Vec<Arc<Material>>,
    hidden: Vec<Hidden>,
    built_in: Vec<OnceLock<Arc<Material>>>,
}

/// A name that a user's file has taken over from another record.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Hidden {
    /// The name: an identifier or a designation.
    pub name: String,
    /// The file that is used.
    pub by: PathBuf,
    /// The identifiers of the records that are not found by this name any more.
    pub instead_of: Vec<String>,
}

impl fmt::Display for Hidden {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        let Self { name, by, instead_of } = self;
        write!(
            f,
            "`{name}` is read from {} instead of {} of the library",
            by.display(),
            instead_of.join(", ")
        )
    }
}

impl Library {
    /// The built-in records alone.
    pub fn built_in() -> Self {
        let built_in = ENTRIES.iter().map(|_| OnceLock::new()).collect();
        Self { user: Vec::new(), hidden: Vec::new(), built_in }
    }

    /// The built-in records behind those in `folders`; what stands in an earlier folder is found first.
    ///
    /// Every file `*.yaml` or `*.yml` of a folder is read, in the order of their names; subfolders are not.
    ///
    /// # Errors
    /// Every folder and file that cannot be read, with the place of the fault.
    pub fn open(folders: &[PathBuf]) -> Result<Self, Vec<Diagnostic>> {
        let mut library = Self::built_in();
        let mut faults = Vec::new();
        for folder in folders {
            match files_of(folder) {
                Ok(files) => library.read_folder(&files, &mut faults),
                Err(fault) => faults.push(*fault),
            }
        }
        if faults.is_empty() { Ok(library) } else { Err(faults) }
    }

    /// The material called `name`, an identifier or a designation; case, blanks, hyphens and `+` are forgiven.
    ///
    /// The user's files come before the built-in records, identifiers before designations.
    ///
    /// # Errors
    /// No material, or several conditions of one, have that name.
    pub fn find(&self, name: &str) -> Result<Arc<Material>, NotFound> {
        let wanted = plain(name);
        if let Some(found) = self.user.iter().find(|material| plain(&material.id) == wanted) {
            return Ok(found.clone());
        }
        let designated = |material: &&Arc<Material>| lookup::any_is(&material.designations, &wanted);
        let users: Vec<Arc<Material>> = self.user.iter().filter(designated).cloned().collect();
        if !users.is_empty() {
            return lookup::only(name, users);
        }
        let found = self.find_built_in(&wanted);
        if found.is_empty() { Err(lookup::miss(name, self.names())) } else { lookup::only(name, found) }
    }

    /// The built-in record with that identifier, else all with that designation.
    ///
    /// A user's record that replaces a built-in one keeps the designations of the one it replaces.
    fn find_built_in(&self, wanted: &str) -> Vec<Arc<Material>> {
        let records = |fits: &dyn Fn(&Entry) -> bool| -> Vec<Arc<Material>> {
            let fitting = ENTRIES.iter().enumerate().filter(|(_, entry)| fits(entry));
            fitting
                .filter_map(|(index, entry)| self.replacing(entry).or_else(|| self.built_in_at(index)))
                .collect()
        };
        let by_id = records(&|entry| plain(entry.id) == wanted);
        if by_id.is_empty() { records(&|entry| lookup::any_is(entry.designations, wanted)) } else { by_id }
    }

    /// The materials in which every word of `words` occurs: in identifier, name, designations, family or
    /// condition. No words: all materials, the user's first, then the built-in ones in alphabetical order.
    pub fn search(&self, words: &str) -> Vec<Arc<Material>> {
        let words: Vec<String> =
            words.split_whitespace().map(plain).filter(|word| !word.is_empty()).collect();
        self.all().filter(|material| words.iter().all(|word| lookup::has_word(material, word))).collect()
    }

    /// The names that a user's file has taken over.
    pub fn hidden(&self) -> &[Hidden] {
        &self.hidden
    }

    /// File name and text of every built-in record, as a start for one's own.
    pub fn built_in_records() -> impl Iterator<Item = (&'static str, &'static str)> {
        ENTRIES.iter().map(|entry| (entry.file, entry.text))
    }

    fn all(&self) -> impl Iterator<Item = Arc<Material>> + '_ {
        let built_in = ENTRIES.iter().enumerate().filter(|(_, entry)| !self.is_replaced(entry));
        let built_in = built_in.filter_map(|(index, _)| self.built_in_at(index));
        self.user.iter().cloned().chain(built_in)
    }

    /// Every identifier, each with its designations.
    fn names(&self) -> impl Iterator<Item = (&str, Vec<&str>)> + '_ {
        let users = self.user.iter().map(|material| {
            (material.id.as_str(), material.designations.iter().map(String::as_str).collect())
        });
        let built_in = ENTRIES.iter().filter(|entry| !self.is_replaced(entry));
        users.chain(built_in.map(|entry| (entry.id, entry.designations.to_vec())))
    }

    fn is_replaced(&self, entry: &Entry) -> bool {
        self.replacing(entry).is_some()
    }

    /// The user's record that has the identifier of a built-in one.
    fn replacing(&self, entry: &Entry) -> Option<Arc<Material>> {
        let id = plain(entry.id);
        self.user.iter().find(|material| plain(&material.id) == id).cloned()
    }

    /// The built-in record at `index`, read once. None cannot occur: a test reads every record.
    fn built_in_at(&self, index: usize) -> Option<Arc<Material>> {
        let (entry, cell) = (ENTRIES.get(index)?, self.built_in.get(index)?);
        if let Some(material) = cell.get() {
            return Some(material.clone());
        }
        let material = yaml::read(entry.text, entry.id, Origin::BuiltIn).ok()?;
        Some(cell.get_or_init(|| Arc::new(material)).clone())
    }

    fn read_folder(&mut self, files: &[PathBuf], faults: &mut Vec<Diagnostic>) {
        let earlier = self.user.len();
        for file in files {
            match yaml::read_file(file) {
                Ok(material) => {
                    let twin = self.user.iter().position(|other| plain(&other.id) == plain(&material.id));
                    match twin {
                        Some(at) if at >= earlier => faults.push(twice(&material, &self.user[at], file)),
                        Some(at) => self.hide_later(at, &material),
                        None => self.add(material, file),
                    }
                }
                Err(fault) => faults.push(*fault),
            }
        }
    }

    fn hide_later(&mut self, at: usize, later: &Material) {
        if let Some(Origin::File(by)) = self.user.get(at).map(|material| &material.origin) {
            let instead_of = vec![later.id.clone()];
            self.hidden.push(Hidden { name: later.id.clone(), by: by.clone(), instead_of });
        }
    }

    fn add(&mut self, material: Material, file: &Path) {
        for name in std::iter::once(&material.id).chain(&material.designations) {
            let wanted = plain(name);
            let same = |other: &str| plain(other) == wanted;
            let instead_of: Vec<String> = ENTRIES
                .iter()
                .filter(|entry| same(entry.id) || entry.designations.iter().any(|other| same(other)))
                .map(|entry| entry.id.to_owned())
                .collect();
            if !instead_of.is_empty() {
                self.hidden.push(Hidden { name: name.clone(), by: file.to_path_buf(), instead_of });
            }
        }
        self.user.push(Arc::new(material));
    }
}

fn twice(material: &Material, other: &Material, file: &Path) -> Diagnostic {
    let place = match &other.origin {
        Origin::File(path) => path.display().to_string(),
        _ => "the library".to_owned(),
    };
    Diagnostic::new(format!("the material `{}` is also in {place}", material.id))
        .with_help("keep one of the two files, or give one of them another id")
        .in_file(file)
}

fn files_of(folder: &Path) -> Result<Vec<PathBuf>, Box<Diagnostic>> {
    let fault = |error: std::io::Error| {
        let message = format!("cannot read the folder of materials: {error}");
        Box::new(Diagnostic::new(message).in_file(folder))
    };
    let mut files = Vec::new();
    for entry in std::fs::read_dir(folder).map_err(fault)? {
        let path = entry.map_err(fault)?.path();
        let is_yaml = path.extension().is_some_and(|extension| extension == "yaml" || extension == "yml");
        if is_yaml && !path.is_dir() {
            files.push(path);
        }
    }
    files.sort();
    Ok(files)
}
