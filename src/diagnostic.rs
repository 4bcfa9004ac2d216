//! What is said about bad input: message, place, and the way out.

use std::fmt;
use std::path::PathBuf;

/// A place in a text: line and column count from 1, columns in characters.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub struct Place {
    /// Line, from 1.
    pub line: usize,
    /// Column in characters, from 1.
    pub column: usize,
}

/// One fault in an input, told so that it can be mended.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Diagnostic {
    /// What is wrong, lower case, without a full stop.
    pub message: String,
    /// The file, or `<stdin>`; none when the fault is not in a file.
    pub file: Option<PathBuf>,
    /// Where in the file.
    pub place: Option<Place>,
    /// The line of the file at that place, for the picture under the message.
    pub line_text: Option<String>,
    /// How many characters are meant, from the column on (at least 1).
    pub width: usize,
    /// What would be right.
    pub help: Option<String>,
}

impl Diagnostic {
    /// A fault that has no place yet.
    pub fn new(message: impl Into<String>) -> Self {
        Self { message: message.into(), file: None, place: None, line_text: None, width: 1, help: None }
    }

    /// The same fault with the way out.
    pub fn with_help(mut self, help: impl Into<String>) -> Self {
        self.help = Some(help.into());
        self
    }

    /// The same fault in a named file.
    pub fn in_file(mut self, file: impl Into<PathBuf>) -> Self {
        self.file = Some(file.into());
        self
    }

    /// The same fault at a place of `text`, `width` characters wide.
    pub fn at(mut self, text: &str, place: Place, width: usize) -> Self {
        self.line_text =
            place.line.checked_sub(1).and_then(|index| text.lines().nth(index)).map(str::to_owned);
        self.place = Some(place);
        self.width = width.max(1);
        self
    }
}

impl fmt::Display for Diagnostic {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        if let Some(file) = &self.file {
            write!(f, "{}:", file.display())?;
            if let Some(place) = self.place {
                write!(f, "{}:{}:", place.line, place.column)?;
            }
            write!(f, " ")?;
        }
        write!(f, "{}", self.message)
    }
}

impl std::error::Error for Diagnostic {}

/// The candidate closest to `given`, when one is close enough to be a slip of the pen.
///
/// Case, blanks, hyphens and underscores are forgiven. Closeness is the Jaro-Winkler similarity, at least
/// 0.8 (common practice, no source).
pub fn did_you_mean<'a>(given: &str, candidates: impl IntoIterator<Item = &'a str>) -> Option<&'a str> {
    let plain = |text: &str| -> String {
        text.chars()
            .filter(|c| !c.is_whitespace() && *c != '-' && *c != '_')
            .flat_map(char::to_lowercase)
            .collect()
    };
    let given = plain(given);
    let mut best: Option<(f64, &'a str)> = None;
    for candidate in candidates {
        let score = strsim::jaro_winkler(&given, &plain(candidate));
        if score >= 0.8 && best.is_none_or(|(found, _)| score > found) {
            best = Some((score, candidate));
        }
    }
    best.map(|(_, candidate)| candidate)
}
