//! Changes that are not saved yet, kept beside the circuit's file so that a crash loses nothing.
//!
//! Each window keeps one [`Note`] in the folder for such, a few seconds after an edit, and holds a
//! lock beside it as long as it lives. A note whose lock nobody holds is of a window that ended
//! without saving: the next one offers it.

mod keeper;
mod note;
mod offer;

pub(crate) use keeper::{Keeper, Snapshot};
pub(crate) use note::Note;
pub(crate) use offer::{Offer, offers};

#[cfg(test)]
mod tests;

/// What the note of a window is called, and its lock.
const NOTE: &str = "ron";
const LOCK: &str = "lock";
