//! Notes of windows that ended without saving.

use std::fs::{File, TryLockError};
use std::path::{Path, PathBuf};
use std::time::{Duration, SystemTime};

use super::{LOCK, NOTE, Note};

/// A lock without a note is left alone this long: its window may be about to write one.
const FRESH: Duration = Duration::from_secs(24 * 3600);

/// A circuit to restore.
#[derive(Debug)]
pub(crate) struct Offer {
    pub(crate) note: Note,
    file: PathBuf,
    /// Held, so that no second window offers the same; `None` on systems without locks.
    _lock: Option<File>,
}

impl Offer {
    /// The file of the note.
    pub(crate) fn file(&self) -> &Path {
        &self.file
    }

    /// The circuit is kept elsewhere, or nobody wants it: takes the note away.
    ///
    /// # Errors
    /// A sentence when it stays.
    pub(crate) fn remove(self) -> Result<(), String> {
        let removed = std::fs::remove_file(&self.file);
        removed.map_err(|error| format!("{}: {error}", self.file.display()))?;
        // A lock that stays is tidied up later.
        let _ = std::fs::remove_file(self.file.with_extension(LOCK));
        Ok(())
    }
}

/// Circuits that were not saved by windows that are gone, the latest first, and what is wrong with
/// notes that do not read.
pub(crate) fn offers(folder: &Path) -> (Vec<Offer>, Vec<String>) {
    let (mut offers, mut problems) = (Vec::new(), Vec::new());
    // No folder, nothing unsaved.
    for entry in std::fs::read_dir(folder).into_iter().flatten().flatten() {
        let file = entry.path();
        let extension = file.extension().and_then(|extension| extension.to_str());
        match extension {
            Some(NOTE) => {
                let Some(lock) = lock_of_the_gone(&file) else {
                    continue;
                };
                match Note::read(&file) {
                    Ok(note) => offers.push(Offer {
                        note,
                        file,
                        _lock: lock,
                    }),
                    Err(problem) => problems.push(problem),
                }
            }
            Some(LOCK) => tidy(&file),
            _ => {}
        }
    }
    offers.sort_by_key(|offer| std::cmp::Reverse(offer.note.kept_at));
    (offers, problems)
}

/// The lock of a note, if its window is gone; the inner `None` stands for a system without locks.
fn lock_of_the_gone(note: &Path) -> Option<Option<File>> {
    let lock = File::options()
        .create(true)
        .append(true)
        .open(note.with_extension(LOCK));
    let Ok(lock) = lock else {
        return Some(None);
    };
    match lock.try_lock() {
        Ok(()) => Some(Some(lock)),
        Err(TryLockError::WouldBlock) => None,
        Err(TryLockError::Error(_)) => Some(None),
    }
}

/// Removes a lock that has no note and no window.
fn tidy(lock_file: &Path) {
    if lock_file.with_extension(NOTE).exists() {
        return;
    }
    let modified = std::fs::metadata(lock_file).and_then(|metadata| metadata.modified());
    let age = modified.map(|time| SystemTime::now().duration_since(time));
    let old = matches!(age, Ok(Ok(age)) if age > FRESH);
    if old && File::open(lock_file).is_ok_and(|lock| lock.try_lock().is_ok()) {
        // The next start tries again.
        let _ = std::fs::remove_file(lock_file);
    }
}
