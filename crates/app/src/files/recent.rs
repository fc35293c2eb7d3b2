//! Files used lately.

use std::path::{Path, PathBuf};

use serde::{Deserialize, Serialize};

/// How many are remembered.
const MOST: usize = 10;

/// Paths of files used lately, the latest first.
#[derive(Debug, Clone, Default, PartialEq, Eq, Serialize, Deserialize)]
#[serde(transparent)]
pub struct Recent(Vec<PathBuf>);

/// A file used lately.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(crate) struct RecentFile {
    pub(crate) path: PathBuf,
    /// Whether it is gone.
    pub(crate) missing: bool,
}

impl RecentFile {
    /// Its name without the folder.
    pub(crate) fn name(&self) -> String {
        let name = self.path.file_name().unwrap_or(self.path.as_os_str());
        name.to_string_lossy().into_owned()
    }

    /// Its folder.
    pub(crate) fn folder(&self) -> String {
        let folder = self.path.parent().unwrap_or(Path::new(""));
        folder.display().to_string()
    }
}

impl Recent {
    /// A file was opened or written. Paths that are no text cannot be kept as text and are left
    /// out.
    pub fn add(&mut self, path: &Path) {
        let path = std::path::absolute(path).unwrap_or_else(|_| path.to_owned());
        if path.to_str().is_none() {
            return;
        }
        self.remove(&path);
        self.0.insert(0, path);
        self.0.truncate(MOST);
    }

    /// Forgets a file.
    pub fn remove(&mut self, path: &Path) {
        self.0.retain(|known| known != path);
    }

    /// Forgets all.
    pub fn clear(&mut self) {
        self.0.clear();
    }

    /// The files, with whether they are there.
    pub(crate) fn files(&self) -> Vec<RecentFile> {
        let file = |path: &PathBuf| RecentFile {
            path: path.clone(),
            missing: !path.is_file(),
        };
        self.0.iter().map(file).collect()
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_latest_comes_first_and_only_ten_stay() {
        let mut recent = Recent::default();
        for number in 0..12 {
            recent.add(Path::new(&format!("/work/{number}.circuit.ron")));
        }
        recent.add(Path::new("/work/5.circuit.ron"));
        let names: Vec<_> = recent.files().iter().map(RecentFile::name).collect();
        assert_eq!(names.len(), MOST, "ten");
        assert_eq!(names[0], "5.circuit.ron", "the latest, once");
        assert_eq!(names[9], "2.circuit.ron", "the oldest that stays");
        recent.remove(Path::new("/work/5.circuit.ron"));
        assert_eq!(recent.files()[0].name(), "11.circuit.ron", "forgotten");
    }

    #[test]
    fn files_that_are_gone_are_marked() {
        let folder = tempfile::tempdir().unwrap();
        let path = folder.path().join("a.circuit.ron");
        std::fs::write(&path, "()").unwrap();
        let mut recent = Recent::default();
        recent.add(&path);
        assert!(!recent.files()[0].missing, "there");
        std::fs::remove_file(&path).unwrap();
        assert!(recent.files()[0].missing, "gone");
        assert_eq!(
            recent.files()[0].folder(),
            folder.path().display().to_string(),
            "where"
        );
    }
}
