//! Keeps what is not saved, on a thread of its own: a slow disk must not hold up the window.

use std::fs::{File, TryLockError};
use std::io;
use std::path::{Path, PathBuf};
use std::sync::{Arc, Condvar, Mutex, MutexGuard, PoisonError};
use std::thread::JoinHandle;
use std::time::{Duration, Instant, SystemTime, UNIX_EPOCH};

use helmsplit_scenario::Scenario;

use super::note::seconds_now;
use super::{LOCK, NOTE, Note};
use crate::files::in_place::written;

/// From the first edit to the note: short enough to lose little, long enough not to write at
/// every step of a drag.
pub(crate) const DELAY: Duration = Duration::from_secs(2);

/// A circuit to keep.
#[derive(Debug, Clone)]
pub(crate) struct Snapshot {
    pub(crate) scenario: Scenario,
    /// The text it was read from.
    pub(crate) source: Option<Arc<str>>,
    pub(crate) file: Option<PathBuf>,
    /// The last change in words.
    pub(crate) change: String,
}

impl Snapshot {
    fn note(self) -> Note {
        let text = match &self.source {
            Some(source) => written(source, &self.scenario).text(),
            None => self.scenario.to_text(true),
        };
        Note {
            version: env!("CARGO_PKG_VERSION").to_owned(),
            // A path that is no text cannot be kept as text; the circuit still can.
            file: self.file.filter(|file| file.to_str().is_some()),
            name: self.scenario.name,
            kept_at: seconds_now(),
            change: self.change,
            text,
        }
    }
}

#[derive(Default)]
struct Slot {
    /// What to keep, and from when on.
    wanted: Option<(Snapshot, Instant)>,
    /// Everything is saved: no note is needed.
    forget: bool,
    writing: bool,
    quit: bool,
    trouble: Option<String>,
}

struct Shared {
    slot: Mutex<Slot>,
    wake: Condvar,
}

impl Shared {
    /// The slot holds no half-made state, so a panic elsewhere does not spoil it.
    fn slot(&self) -> MutexGuard<'_, Slot> {
        self.slot.lock().unwrap_or_else(PoisonError::into_inner)
    }
}

/// The note of this window.
pub(crate) struct Keeper {
    shared: Arc<Shared>,
    thread: Option<JoinHandle<()>>,
    note: PathBuf,
    lock_file: PathBuf,
    /// Held as long as the window lives; the system lets go of it when the process ends, however
    /// that happens.
    _lock: File,
}

impl Keeper {
    /// Takes a place in the folder for notes. `wake` is called when there is trouble to tell.
    ///
    /// # Errors
    /// What the system said if the folder cannot be used.
    pub(crate) fn start(folder: &Path, wake: impl Fn() + Send + 'static) -> io::Result<Self> {
        std::fs::create_dir_all(folder)?;
        let since = SystemTime::now().duration_since(UNIX_EPOCH);
        let now = since.map_or(0, |since| since.as_nanos());
        let stem = folder.join(format!("{}-{now}", std::process::id()));
        let (note, lock_file) = (stem.with_extension(NOTE), stem.with_extension(LOCK));
        let lock = File::create_new(&lock_file)?;
        match lock.try_lock() {
            Ok(()) => {}
            // Nobody else knows the file, so this is a system without locks: others will offer our
            // note while we live, which is better than to keep none.
            Err(TryLockError::WouldBlock | TryLockError::Error(_)) => {}
        }
        let shared = Arc::new(Shared {
            slot: Mutex::default(),
            wake: Condvar::new(),
        });
        let (theirs, file) = (Arc::clone(&shared), note.clone());
        let thread = std::thread::Builder::new()
            .name("keeper".to_owned())
            .spawn(move || work(&theirs, &file, &wake))?;
        Ok(Self {
            shared,
            thread: Some(thread),
            note,
            lock_file,
            _lock: lock,
        })
    }

    /// Keeps a circuit, soon; it replaces one that waits.
    pub(crate) fn keep(&self, snapshot: Snapshot) {
        let mut slot = self.shared.slot();
        let due = match &slot.wanted {
            Some((_, due)) => *due,
            None => Instant::now() + DELAY,
        };
        slot.wanted = Some((snapshot, due));
        slot.forget = false;
        self.shared.wake.notify_all();
    }

    /// Nothing is unsaved any more.
    pub(crate) fn forget(&self) {
        let mut slot = self.shared.slot();
        slot.wanted = None;
        slot.forget = true;
        self.shared.wake.notify_all();
    }

    /// Waits until what was handed over is on the disk.
    pub(crate) fn settle(&self) {
        let mut slot = self.shared.slot();
        if let Some((_, due)) = &mut slot.wanted {
            *due = Instant::now();
        }
        self.shared.wake.notify_all();
        while slot.wanted.is_some() || slot.forget || slot.writing {
            slot = self
                .shared
                .wake
                .wait(slot)
                .unwrap_or_else(PoisonError::into_inner);
        }
    }

    /// Why the last note could not be written, once.
    pub(crate) fn trouble(&self) -> Option<String> {
        self.shared.slot().trouble.take()
    }

    /// The file of the note.
    pub(crate) fn file(&self) -> &Path {
        &self.note
    }
}

/// Keeps what still waits. The note stays: only [`Keeper::forget`] takes it away, so that a
/// window that breaks down leaves it behind.
impl Drop for Keeper {
    fn drop(&mut self) {
        self.shared.slot().quit = true;
        self.shared.wake.notify_all();
        if let Some(thread) = self.thread.take() {
            // Its panic was printed; there is nothing to add.
            let _ = thread.join();
        }
        if !self.note.exists() {
            // Somebody may have tidied up before us.
            let _ = std::fs::remove_file(&self.lock_file);
        }
    }
}

fn work(shared: &Shared, file: &Path, wake: &dyn Fn()) {
    let mut slot = shared.slot();
    loop {
        let now = Instant::now();
        if slot.forget {
            slot.forget = false;
            slot.writing = true;
            drop(slot);
            let removed = std::fs::remove_file(file);
            let trouble = removed
                .err()
                .filter(|error| error.kind() != io::ErrorKind::NotFound)
                .map(|error| format!("{}: {error}", file.display()));
            slot = done(shared, trouble, wake);
        } else if slot
            .wanted
            .as_ref()
            .is_some_and(|(_, due)| slot.quit || *due <= now)
        {
            let wanted = slot.wanted.take();
            slot.writing = true;
            drop(slot);
            let written = wanted.map(|(snapshot, _)| snapshot.note().write(file));
            let trouble = written.and_then(Result::err).map(|error| error.to_string());
            slot = done(shared, trouble, wake);
        } else if slot.quit {
            return;
        } else {
            let wait = slot.wanted.as_ref().map(|(_, due)| due.duration_since(now));
            slot = match wait {
                Some(wait) => {
                    let waited = shared.wake.wait_timeout(slot, wait);
                    waited.unwrap_or_else(PoisonError::into_inner).0
                }
                None => shared
                    .wake
                    .wait(slot)
                    .unwrap_or_else(PoisonError::into_inner),
            };
        }
    }
}

fn done<'a>(shared: &'a Shared, trouble: Option<String>, wake: &dyn Fn()) -> MutexGuard<'a, Slot> {
    let mut slot = shared.slot();
    slot.writing = false;
    if trouble.is_some() {
        slot.trouble = trouble;
        wake();
    }
    shared.wake.notify_all();
    slot
}
