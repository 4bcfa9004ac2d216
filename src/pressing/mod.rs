//! A recorded press-in force judged against what the joint allows.
//!
//! | question | module |
//! |---|---|
//! | What does the record hold? | [`read`](mod@read), [`columns`], [`trace`] |
//! | What does the joint allow? | [`window`] |
//! | Is the record within it, and what does it tell? | [`judge`](mod@judge), [`checks`] |
//! | What friction, what interference? | [`inference`] |
//!
//! All numbers are SI (m, N, Pa). A record is read row by row and kept as at most [`trace::MOST_BINS`] bins, so
//! that its length does not matter.

pub mod checks;
pub mod columns;
pub mod inference;
pub mod judge;
pub mod read;
pub mod trace;
pub mod window;

mod line_fit;

pub use checks::{Check, CheckKind, CheckUnit, Limit};
pub use inference::{Bounded, Inferred};
pub use judge::{Judged, Settings, judge};
pub use read::{Record, read};
pub use trace::Point;
pub use window::{Window, WindowError};
