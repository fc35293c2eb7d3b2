//! Where the program keeps its own files.

use std::path::{Path, PathBuf};

use directories::ProjectDirs;

/// The folders of one user.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Home {
    config: PathBuf,
    state: PathBuf,
}

impl Home {
    /// The folders that the platform has for that; on Linux `~/.config/helmsplit` and
    /// `~/.local/state/helmsplit`, or where `XDG_CONFIG_HOME` and `XDG_STATE_HOME` say (XDG Base
    /// Directory Specification). `None` if there is no home folder.
    #[must_use]
    pub fn of_user() -> Option<Self> {
        let folders = ProjectDirs::from("", "", "helmsplit")?;
        let state = folders.state_dir().unwrap_or(folders.data_local_dir());
        Some(Self {
            config: folders.config_dir().to_owned(),
            state: state.to_owned(),
        })
    }

    /// Everything in one folder.
    #[must_use]
    pub fn at(folder: &Path) -> Self {
        Self {
            config: folder.join("config"),
            state: folder.join("state"),
        }
    }

    /// Settings, and files used lately.
    #[must_use]
    pub fn settings_file(&self) -> PathBuf {
        self.config.join("settings.ron")
    }

    /// Widths of panes and what is folded.
    #[must_use]
    pub fn layout_file(&self) -> PathBuf {
        self.state.join("layout.ron")
    }

    /// Circuits that are not saved yet.
    #[must_use]
    pub fn unsaved_folder(&self) -> PathBuf {
        self.state.join("unsaved")
    }
}
