//! The folders in which a user keeps materials.

use std::ffi::OsString;
use std::path::{Path, PathBuf};

/// Folder for materials inside a data folder.
const INSIDE: &str = "hubgrip/materials";

/// The user's folders, the first to be searched first.
///
/// 1. `explicit`, from the command line;
/// 2. the environment variable `HUBGRIP_MATERIALS`;
/// 3. `hubgrip/materials` in `$XDG_DATA_HOME`, by default `~/.local/share`;
/// 4. `hubgrip/materials` in each folder of `$XDG_DATA_DIRS`, by default `/usr/local/share:/usr/share`.
///
/// The first two are taken as given, so that a wrong name is reported; the others only when they exist. An
/// empty variable counts as not set, a relative path in an XDG variable is ignored.
///
/// Source: XDG Base Directory Specification, version 0.8.
pub fn user_folders(explicit: Option<&Path>) -> Vec<PathBuf> {
    folders(explicit, |name| std::env::var_os(name), etcetera::home_dir().ok())
}

fn folders(
    explicit: Option<&Path>,
    variable: impl Fn(&str) -> Option<OsString>,
    home: Option<PathBuf>,
) -> Vec<PathBuf> {
    let set = |name: &str| variable(name).filter(|value| !value.is_empty());
    let named =
        explicit.map(Path::to_path_buf).into_iter().chain(set("HUBGRIP_MATERIALS").map(PathBuf::from));
    let absolute = |name: &str| set(name).map(PathBuf::from).filter(|path| path.is_absolute());
    let data_home = absolute("XDG_DATA_HOME").or_else(|| home.map(|home| home.join(".local/share")));
    let data_dirs = set("XDG_DATA_DIRS").unwrap_or_else(|| "/usr/local/share:/usr/share".into());
    let shared = std::env::split_paths(&data_dirs).filter(|path| path.is_absolute()).collect::<Vec<_>>();
    let standard = data_home.into_iter().chain(shared).map(|path| path.join(INSIDE));
    let mut found: Vec<PathBuf> = Vec::new();
    for folder in named.chain(standard.filter(|path| path.is_dir())) {
        if !found.contains(&folder) {
            found.push(folder);
        }
    }
    found
}

#[cfg(test)]
mod tests {
    use super::*;

    fn with(variables: &[(&str, &Path)], explicit: Option<&Path>) -> Vec<PathBuf> {
        let variable = |name: &str| {
            variables.iter().find(|(known, _)| *known == name).map(|(_, value)| value.as_os_str().to_owned())
        };
        folders(explicit, variable, None)
    }

    #[test]
    fn the_command_line_comes_first_then_the_variable_then_the_data_folders() {
        let data = tempfile::tempdir().unwrap();
        let inside = data.path().join(INSIDE);
        std::fs::create_dir_all(&inside).unwrap();
        let variables = [("HUBGRIP_MATERIALS", Path::new("mine")), ("XDG_DATA_HOME", data.path())];
        let found = with(&variables, Some(Path::new("given")));
        assert_eq!(found[..3], [PathBuf::from("given"), PathBuf::from("mine"), inside]);
    }

    #[test]
    fn relative_data_folders_and_empty_variables_are_ignored() {
        let variables = [
            ("HUBGRIP_MATERIALS", Path::new("")),
            ("XDG_DATA_HOME", Path::new("relative")),
            ("XDG_DATA_DIRS", Path::new("also/relative")),
        ];
        assert_eq!(with(&variables, None), Vec::<PathBuf>::new());
    }

    #[test]
    fn the_home_folder_stands_in_for_the_data_folder() {
        let home = tempfile::tempdir().unwrap();
        let inside = home.path().join(".local/share").join(INSIDE);
        std::fs::create_dir_all(&inside).unwrap();
        let dirs = |name: &str| (name == "XDG_DATA_DIRS").then(|| OsString::from("/nonexistent"));
        assert_eq!(folders(None, dirs, Some(home.path().to_path_buf())), [inside]);
    }
}
