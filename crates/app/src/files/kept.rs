//! What is kept from one start to the next, in one file that every window of ours shares.

use std::path::{Path, PathBuf};

use helmsplit_scenario::FileError;
use helmsplit_scenario::write::save_atomically;
use ron::ser::PrettyConfig;
use serde::{Deserialize, Serialize};

use super::recent::Recent;
use crate::settings::Settings;

/// Size of the window, points.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
#[serde(default)]
pub struct WindowPlace {
    /// Width and height.
    pub size: [f32; 2],
    /// Whether it fills the screen.
    pub maximized: bool,
}

impl Default for WindowPlace {
    fn default() -> Self {
        Self {
            size: [1360.0, 840.0],
            maximized: false,
        }
    }
}

/// Everything that is kept.
#[derive(Debug, Clone, Default, PartialEq, Serialize, Deserialize)]
#[serde(default)]
pub struct Kept {
    /// What the user prefers.
    pub settings: Settings,
    /// The window as it was closed.
    pub window: WindowPlace,
    /// Files used lately.
    pub recent: Recent,
    /// Folder of the file that was opened or written last.
    pub folder: Option<PathBuf>,
}

impl Kept {
    /// Reads the file; `None` if there is none yet.
    ///
    /// # Errors
    /// A sentence when it cannot be read or is not what we write.
    pub fn read(file: &Path) -> Result<Option<Self>, String> {
        let text = match std::fs::read_to_string(file) {
            Ok(text) => text,
            Err(error) if error.kind() == std::io::ErrorKind::NotFound => return Ok(None),
            Err(error) => return Err(format!("{}: {error}", file.display())),
        };
        let read = ron::from_str(&text).map(Some);
        read.map_err(|error| format!("{}:{error}", file.display()))
    }

    /// Reads the file. One that does not read is put aside under another name, so that nothing in
    /// it is lost, and the second value says so.
    #[must_use]
    pub fn read_or_put_aside(file: &Path) -> (Self, Option<String>) {
        match Self::read(file) {
            Ok(kept) => (kept.unwrap_or_default(), None),
            Err(reason) => {
                let aside = file.with_extension("ron.unread");
                let kept_as = match std::fs::rename(file, &aside) {
                    Ok(()) => format!("; the file is now called {}", aside.display()),
                    Err(_) => String::new(),
                };
                let notice =
                    format!("The settings did not read and are as at first: {reason}{kept_as}");
                (Self::default(), Some(notice))
            }
        }
    }

    /// Writes the file, all or nothing.
    ///
    /// # Errors
    /// [`FileError`] if it cannot be written.
    pub fn write(&self, file: &Path) -> Result<(), FileError> {
        if let Some(folder) = file.parent() {
            // If the folder cannot be made, writing into it says why.
            let _ = std::fs::create_dir_all(folder);
        }
        // Plain data always has a text.
        let text = ron::ser::to_string_pretty(self, PrettyConfig::default())
            .unwrap_or_else(|error| unreachable!("settings are plain data: {error}"));
        save_atomically(file, &text)
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::settings::Appearance;
    use helmsplit_scenario::UnitSystem;

    fn kept() -> Kept {
        let mut kept = Kept {
            settings: Settings {
                units: UnitSystem::Us,
                appearance: Appearance::Dark,
                scale: 125,
                ..Settings::default()
            },
            window: WindowPlace {
                size: [1000.0, 700.0],
                maximized: true,
            },
            ..Kept::default()
        };
        kept.recent.add(Path::new("/a/b.circuit.ron"));
        kept
    }

    #[test]
    fn what_is_kept_comes_back() {
        let folder = tempfile::tempdir().unwrap();
        let file = folder.path().join("deep/down/settings.ron");
        assert_eq!(Kept::read(&file), Ok(None), "nothing yet");
        kept().write(&file).unwrap();
        assert_eq!(Kept::read(&file), Ok(Some(kept())), "all of it");
    }

    #[test]
    fn files_of_other_versions_give_what_they_have() {
        let folder = tempfile::tempdir().unwrap();
        let file = folder.path().join("settings.ron");
        std::fs::write(&file, "(settings: (scale: 150))").unwrap();
        let kept = Kept::read(&file).unwrap().unwrap();
        assert_eq!(kept.settings.scale, 150, "what is there");
        assert_eq!(kept.window, WindowPlace::default(), "what is not");
    }

    #[test]
    fn a_file_that_does_not_read_is_put_aside() {
        let folder = tempfile::tempdir().unwrap();
        let file = folder.path().join("settings.ron");
        std::fs::write(&file, "(settings: (scale: \"large\"))").unwrap();
        let (kept, notice) = Kept::read_or_put_aside(&file);
        assert_eq!(kept, Kept::default(), "as at first");
        assert!(
            notice.unwrap().contains("settings.ron:1:"),
            "and says where"
        );
        let aside = folder.path().join("settings.ron.unread");
        assert!(
            std::fs::read_to_string(aside).unwrap().contains("large"),
            "kept"
        );
    }
}
