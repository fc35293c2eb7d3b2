//! What is in a folder.

use std::path::{Path, PathBuf};
use std::time::SystemTime;

use super::FileKind;
use crate::files::words::{age, file_size};

/// Entries that are shown; nobody reads further down.
const MOST_ENTRIES: usize = 500;

/// One file or folder.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(super) struct Entry {
    pub(super) name: String,
    pub(super) path: PathBuf,
    pub(super) is_folder: bool,
    /// `folder`, or size and age.
    pub(super) detail: String,
}

/// What to leave out.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) struct Filter {
    pub(super) kind: FileKind,
    /// Files of other kinds, and those whose names begin with a dot, too.
    pub(super) everything: bool,
}

/// A folder that was read.
#[derive(Debug, Clone, Default)]
pub(super) struct Listing {
    pub(super) entries: Vec<Entry>,
    /// How many more there are than are shown.
    pub(super) more: usize,
}

/// Reads a folder: folders first, each by name.
///
/// # Errors
/// A sentence when the folder cannot be read.
pub(super) fn listing(folder: &Path, filter: Filter) -> Result<Listing, String> {
    let refused =
        |error: std::io::Error| format!("The folder {} cannot be read: {error}.", folder.display());
    let now = SystemTime::now();
    let mut entries = Vec::new();
    for entry in std::fs::read_dir(folder).map_err(refused)? {
        // A file that vanishes while the folder is read is no fault of the folder.
        let Ok(entry) = entry else { continue };
        let path = entry.path();
        // Through links: a link to a folder is a folder to go to.
        let Ok(metadata) = std::fs::metadata(&path) else {
            continue;
        };
        let name = entry.file_name().to_string_lossy().into_owned();
        let is_folder = metadata.is_dir();
        let shown = if filter.everything {
            true
        } else {
            !name.starts_with('.') && (is_folder || filter.kind.holds(&name))
        };
        if !shown {
            continue;
        }
        let detail = if is_folder {
            "folder".to_owned()
        } else {
            let since = metadata.modified().ok().map(|time| age(time, now));
            let since = since.map_or_else(String::new, |age| format!(", {age}"));
            format!("{}{since}", file_size(metadata.len()))
        };
        entries.push(Entry {
            name,
            path,
            is_folder,
            detail,
        });
    }
    entries.sort_by_cached_key(|entry| (!entry.is_folder, entry.name.to_lowercase()));
    let more = entries.len().saturating_sub(MOST_ENTRIES);
    entries.truncate(MOST_ENTRIES);
    Ok(Listing { entries, more })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn folders_come_first_and_other_kinds_only_when_asked_for() {
        let folder = tempfile::tempdir().unwrap();
        for name in [
            "b.circuit.ron",
            "A.circuit.ron",
            "notes.txt",
            ".hidden.circuit.ron",
        ] {
            std::fs::write(folder.path().join(name), "()").unwrap();
        }
        std::fs::create_dir(folder.path().join("older")).unwrap();
        let names = |everything: bool| -> Vec<String> {
            let filter = Filter {
                kind: FileKind::CIRCUIT,
                everything,
            };
            let listing = listing(folder.path(), filter).unwrap();
            listing
                .entries
                .into_iter()
                .map(|entry| entry.name)
                .collect()
        };
        assert_eq!(
            names(false),
            ["older", "A.circuit.ron", "b.circuit.ron"],
            "circuits"
        );
        assert_eq!(names(true).len(), 5, "everything");
    }

    #[test]
    fn a_folder_that_cannot_be_read_says_so() {
        let filter = Filter {
            kind: FileKind::CIRCUIT,
            everything: false,
        };
        let sentence = listing(Path::new("/no such folder"), filter).unwrap_err();
        assert!(sentence.contains("/no such folder"), "{sentence}");
    }
}
