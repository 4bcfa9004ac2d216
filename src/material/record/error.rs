//! What is wrong with a material record, and where in it.

use std::fmt;

/// One step on the way to a value in a record: a key of a mapping or a place in a list.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum Step {
    /// A key.
    Key(String),
    /// A place in a list, from 0.
    Index(usize),
}

impl From<&str> for Step {
    fn from(key: &str) -> Self {
        Self::Key(key.to_owned())
    }
}

impl From<usize> for Step {
    fn from(index: usize) -> Self {
        Self::Index(index)
    }
}

/// A record that can be read but does not describe a material.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct MaterialError {
    /// The way to the faulty value, from the top of the record; empty: the record as a whole.
    pub path: Vec<Step>,
    /// What is wrong, lower case, without a full stop.
    pub message: String,
    /// What would be right.
    pub help: Option<String>,
}

impl MaterialError {
    /// A fault of the value itself.
    pub fn new(message: impl Into<String>) -> Self {
        Self { path: Vec::new(), message: message.into(), help: None }
    }

    /// The same fault with the way out.
    pub fn with_help(mut self, help: impl Into<String>) -> Self {
        self.help = Some(help.into());
        self
    }

    /// The same fault seen from one level above, under `step`.
    pub fn under(mut self, step: impl Into<Step>) -> Self {
        self.path.insert(0, step.into());
        self
    }
}

impl fmt::Display for MaterialError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        for (depth, step) in self.path.iter().enumerate() {
            match step {
                Step::Key(key) if depth == 0 => write!(f, "{key}")?,
                Step::Key(key) => write!(f, ".{key}")?,
                Step::Index(index) => write!(f, "[{index}]")?,
            }
        }
        if !self.path.is_empty() {
            write!(f, ": ")?;
        }
        f.write_str(&self.message)
    }
}

impl std::error::Error for MaterialError {}
