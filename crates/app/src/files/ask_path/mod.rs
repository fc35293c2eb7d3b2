//! Asks for the path of a file: to open, to save, to export to.
//!
//! A part of the window pushes [`Action::AskPath`] with an [`AskPath`]; once a path is chosen, the
//! app does the action that [`AskPath::then`] makes of it. The dialog of the desktop asks where
//! there is one, else [`PathDialog`], our own.

mod desktop;
mod dialog;
mod listing;
mod typed;

use std::path::PathBuf;

pub(crate) use desktop::{Answered, Asking, desktop_asks};
pub(crate) use dialog::{PathDialog, path_dialog};
pub(crate) use typed::with_ending;

use crate::action::Action;

/// A kind of file.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) struct FileKind {
    /// What such files are called: `Circuit files`.
    pub(crate) name: &'static str,
    /// What their names end with, without the leading dot: `circuit.ron`.
    pub(crate) ending: &'static str,
}

impl FileKind {
    /// Circuits.
    pub(crate) const CIRCUIT: Self = Self {
        name: "Circuit files",
        ending: "circuit.ron",
    };

    /// Drawings.
    pub(crate) const SVG: Self = Self {
        name: "SVG drawings",
        ending: "svg",
    };

    /// Whether a file of that name is of this kind.
    pub(crate) fn holds(self, name: &str) -> bool {
        let (name, ending) = (name.to_lowercase(), self.ending.to_lowercase());
        let stem = name.strip_suffix(&ending);
        stem.is_some_and(|stem| stem.ends_with('.') && stem.len() > 1)
    }
}

/// Whether the file is there already.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) enum Purpose {
    /// It is, and will be read.
    Open,
    /// It will be written; one that is there is only replaced after a question.
    Save,
}

/// A question for a path.
#[derive(Debug, Clone)]
pub(crate) struct AskPath {
    /// Heading of the dialog, such as `Save the circuit as`.
    pub(crate) title: &'static str,
    pub(crate) purpose: Purpose,
    pub(crate) kind: FileKind,
    /// File to begin with, with its folder or without; may be empty.
    pub(crate) proposal: PathBuf,
    /// What to do with the path. A variant such as `Action::Open` is such a function.
    pub(crate) then: fn(PathBuf) -> Action,
}

impl AskPath {
    /// Asks for a file to read.
    pub(crate) fn open(title: &'static str, kind: FileKind, then: fn(PathBuf) -> Action) -> Self {
        Self {
            title,
            purpose: Purpose::Open,
            kind,
            proposal: PathBuf::new(),
            then,
        }
    }

    /// Asks for a file to write and proposes one.
    pub(crate) fn save(
        title: &'static str,
        kind: FileKind,
        proposal: impl Into<PathBuf>,
        then: fn(PathBuf) -> Action,
    ) -> Self {
        Self {
            title,
            purpose: Purpose::Save,
            kind,
            proposal: proposal.into(),
            then,
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn files_are_sorted_by_their_ending() {
        for (name, holds) in [
            ("orchard.circuit.ron", true),
            ("ORCHARD.Circuit.RON", true),
            ("orchard.ron", false),
            ("circuit.ron", false),
            (".circuit.ron", false),
            ("orchardcircuit.ron", false),
        ] {
            assert_eq!(FileKind::CIRCUIT.holds(name), holds, "{name}");
        }
    }
}
