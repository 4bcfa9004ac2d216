//! From the cells of a row to its findings.

use std::collections::BTreeMap;
use std::path::PathBuf;
use std::sync::{PoisonError, RwLock};

use super::cell;
use super::field::Field;
use super::header::Column;
use super::outcome::Outcome;
use super::template::Template;
use crate::diagnostic::Diagnostic;
use crate::joint::{Joint, read};
use crate::material::library::Library;

/// Templates that are kept for all rows; a table that needs more reads those rows in full.
const MOST_TEMPLATES: usize = 1024;
/// Templates that a worker has at hand.
const MOST_AT_HAND: usize = 16;

/// Keys that are shown and change no number.
const SHOWN_ONLY: [&str; 4] = ["title", "drawing", "note", "date"];
/// Longest text of such a key that needs no look of the reader, bytes.
const SHORT: usize = 100;

/// What every row is read with.
pub(super) struct Rows<'a> {
    pub(super) columns: Vec<Column>,
    pub(super) library: &'a Library,
    /// The joint file that supplies what is common.
    pub(super) base: String,
    /// What messages call it.
    pub(super) base_name: PathBuf,
    /// Changes from the command line.
    pub(super) set: Vec<(String, String)>,
    templates: RwLock<BTreeMap<Vec<u8>, Option<Template>>>,
}

/// What one worker has at hand; the last used template comes first.
#[derive(Default)]
pub(super) struct Worker {
    key: Vec<u8>,
    at_hand: Vec<(Vec<u8>, Option<Template>)>,
}

impl<'a> Rows<'a> {
    pub(super) fn new(
        columns: Vec<Column>,
        library: &'a Library,
        base: String,
        base_name: PathBuf,
        set: Vec<(String, String)>,
    ) -> Self {
        Self { columns, library, base, base_name, set, templates: RwLock::default() }
    }

    /// The findings of a row, or what is wrong with it.
    ///
    /// Which way a row is read depends on nothing but its cells, so that its numbers do not depend on its neighbours.
    pub(super) fn outcome(&self, worker: &mut Worker, cells: &[&str]) -> Result<Outcome, String> {
        self.key_of(cells, &mut worker.key);
        if !self.bring_to_hand(worker) {
            let joint = self.read(cells)?;
            let filled: Vec<usize> = (0..cells.len()).filter(|index| self.is_filled(*index, cells)).collect();
            let template = Template::of(&joint, &self.columns, &filled);
            self.keep(worker, template);
        }
        if let Some((_, Some(template))) = worker.at_hand.first_mut()
            && let Some(joint) = template.row(cells, &self.columns)
        {
            return Outcome::of(joint);
        }
        Outcome::of(&self.read(cells)?)
    }

    fn is_filled(&self, index: usize, cells: &[&str]) -> bool {
        self.columns.get(index).is_some_and(|column| column.key.is_some())
            && cells.get(index).is_some_and(|cell| !cell.is_empty())
    }

    /// What rows of one template agree in: the cells that are not put in straight, and which cells are filled.
    fn key_of(&self, cells: &[&str], key: &mut Vec<u8>) {
        key.clear();
        for (column, cell) in self.columns.iter().zip(cells) {
            let Some(name) = &column.key else { continue };
            if Field::has(name) {
                key.push(u8::from(!cell.is_empty()));
            } else if SHOWN_ONLY.contains(&name.as_str()) && is_plain(cell) {
                key.push(0);
            } else {
                key.extend_from_slice(cell.as_bytes());
                key.push(0);
            }
        }
    }

    /// Brings the template of the key to the front; false when there is none yet.
    fn bring_to_hand(&self, worker: &mut Worker) -> bool {
        if let Some(place) = worker.at_hand.iter().position(|(key, _)| *key == worker.key) {
            worker.at_hand.swap(0, place);
            return true;
        }
        let templates = self.templates.read().unwrap_or_else(PoisonError::into_inner);
        let Some(template) = templates.get(&worker.key) else { return false };
        let template = template.clone();
        drop(templates);
        take_to_hand(worker, template);
        true
    }

    fn keep(&self, worker: &mut Worker, template: Option<Template>) {
        let mut templates = self.templates.write().unwrap_or_else(PoisonError::into_inner);
        if templates.len() < MOST_TEMPLATES {
            templates.insert(worker.key.clone(), template.clone());
        }
        drop(templates);
        take_to_hand(worker, template);
    }

    /// The joint of a row, by the reader of joint files.
    fn read(&self, cells: &[&str]) -> Result<Joint, String> {
        let mut set: Vec<(String, String)> = Vec::with_capacity(self.set.len() + cells.len());
        for (column, cell) in self.columns.iter().zip(cells) {
            if let Some(key) = &column.key
                && !cell.is_empty()
            {
                set.push((key.clone(), cell::written(cell, column).into_owned()));
            }
        }
        set.extend(self.set.iter().cloned());
        read::read(&self.base, &self.base_name, &set, self.library)
            .map_err(|faults| faults.iter().map(told).collect::<Vec<_>>().join("; "))
    }
}

/// Whether a text is one that the reader of joint files takes as it is.
fn is_plain(cell: &str) -> bool {
    cell.len() <= SHORT && !cell.starts_with(['{', '[', '"', '\'']) && !cell.contains(char::is_control)
}

fn take_to_hand(worker: &mut Worker, template: Option<Template>) {
    worker.at_hand.truncate(MOST_AT_HAND - 1);
    worker.at_hand.insert(0, (worker.key.clone(), template));
}

/// A fault in one line; the columns are changes to the reader, which is no news to the reader of the table.
fn told(fault: &Diagnostic) -> String {
    let message = fault.message.strip_prefix("--set ").unwrap_or(&fault.message);
    let place = match (&fault.file, fault.place) {
        (Some(file), Some(place)) => format!("{}:{}: ", file.display(), place.line),
        _ => String::new(),
    };
    let help = fault.help.as_ref().map_or_else(String::new, |help| format!(" ({help})"));
    let line: String =
        format!("{place}{message}{help}").chars().map(|c| if c.is_control() { ' ' } else { c }).collect();
    line
}
