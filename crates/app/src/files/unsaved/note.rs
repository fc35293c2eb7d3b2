//! One circuit that is not saved.

use std::path::{Path, PathBuf};
use std::time::{Duration, SystemTime, UNIX_EPOCH};

use helmsplit_scenario::FileError;
use helmsplit_scenario::write::save_atomically;
use ron::ser::PrettyConfig;
use serde::{Deserialize, Serialize};

/// A circuit that is not saved, with what a person needs to tell it from others.
#[derive(Debug, Clone, PartialEq, Eq, Serialize, Deserialize)]
pub(crate) struct Note {
    /// The version of the program that wrote it.
    pub(crate) version: String,
    /// Name of the circuit.
    pub(crate) name: String,
    /// Its file, if it has one.
    pub(crate) file: Option<PathBuf>,
    /// When it was kept, in seconds since 1970.
    pub(crate) kept_at: u64,
    /// The last change in words; may be empty.
    pub(crate) change: String,
    /// The text of its circuit file.
    pub(crate) text: String,
}

impl Note {
    /// When it was kept.
    pub(crate) fn time(&self) -> SystemTime {
        UNIX_EPOCH + Duration::from_secs(self.kept_at)
    }

    /// What to call it: the name of its file, else of the circuit.
    pub(crate) fn title(&self) -> String {
        let name = self.file.as_deref().and_then(Path::file_name);
        name.map_or_else(
            || self.name.clone(),
            |name| name.to_string_lossy().into_owned(),
        )
    }

    /// Reads one.
    ///
    /// # Errors
    /// A sentence that names the file.
    pub(super) fn read(file: &Path) -> Result<Self, String> {
        let text = std::fs::read_to_string(file);
        let text = text.map_err(|error| format!("{}: {error}", file.display()))?;
        ron::from_str(&text).map_err(|error| format!("{}:{error}", file.display()))
    }

    /// Writes it, all or nothing.
    ///
    /// # Errors
    /// [`FileError`] if it cannot be written.
    pub(super) fn write(&self, file: &Path) -> Result<(), FileError> {
        // Plain data always has a text.
        let text = ron::ser::to_string_pretty(self, PrettyConfig::default())
            .unwrap_or_else(|error| unreachable!("a note is plain data: {error}"));
        save_atomically(file, &text)
    }
}

/// Seconds since 1970.
pub(super) fn seconds_now() -> u64 {
    let since = SystemTime::now().duration_since(UNIX_EPOCH);
    since.map_or(0, |since| since.as_secs())
}
