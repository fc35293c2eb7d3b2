//! Notices when another program changes or removes the file of the circuit.
//!
//! A thread of its own looks every now and then, and the window is woken only by news: an idle
//! window stays idle, and a slow network drive does not hold it up.

use std::path::{Path, PathBuf};
use std::sync::mpsc::{Receiver, Sender, channel};
use std::sync::{Arc, Condvar, Mutex, MutexGuard, PoisonError};
use std::thread::JoinHandle;
use std::time::{Duration, SystemTime};

/// How often to look.
const PERIOD: Duration = Duration::from_millis(1500);

/// What happened to the file.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) enum DiskNews {
    /// It holds another text.
    Changed,
    /// It is gone.
    Gone,
}

/// A file to watch.
#[derive(Debug, Clone)]
struct Watched {
    path: PathBuf,
    /// The text that we know of.
    text: Arc<str>,
    /// Time and size when it was looked at last.
    stamp: Option<(SystemTime, u64)>,
    /// What was told already.
    told: Option<DiskNews>,
}

#[derive(Default)]
struct Slot {
    watched: Option<Watched>,
    /// Counts up with each file to watch: news of one before is no news.
    round: u64,
    /// Read it even if time and size are as before.
    closely: bool,
    quit: bool,
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

/// Watches one file.
pub(crate) struct Watch {
    shared: Arc<Shared>,
    news: Receiver<(u64, DiskNews)>,
    thread: Option<JoinHandle<()>>,
}

impl Watch {
    /// Starts the thread. `wake` is called when there is news.
    ///
    /// # Errors
    /// What the system said if it has no thread to give.
    pub(crate) fn start(wake: impl Fn() + Send + 'static) -> std::io::Result<Self> {
        let shared = Arc::new(Shared {
            slot: Mutex::default(),
            wake: Condvar::new(),
        });
        let (sender, news) = channel();
        let theirs = Arc::clone(&shared);
        let thread = std::thread::Builder::new()
            .name("file watch".to_owned())
            .spawn(move || work(&theirs, &sender, &wake))?;
        Ok(Self {
            shared,
            news,
            thread: Some(thread),
        })
    }

    /// Watches another file, of which `text` is known; `None` watches nothing.
    pub(crate) fn watch(&self, file: Option<(&Path, Arc<str>)>) {
        let mut slot = self.shared.slot();
        slot.watched = file.map(|(path, text)| Watched {
            path: path.to_owned(),
            text,
            stamp: None,
            told: None,
        });
        slot.round += 1;
        self.shared.wake.notify_all();
    }

    /// Looks now, and at the text itself: files of the same time and size can differ.
    pub(crate) fn look(&self) {
        self.shared.slot().closely = true;
        self.shared.wake.notify_all();
    }

    /// The next news of the file that is watched.
    pub(crate) fn news(&self) -> Option<DiskNews> {
        let now = self.shared.slot().round;
        let fresh = self.news.try_iter().filter(|(round, _)| *round == now);
        fresh.map(|(_, news)| news).last()
    }
}

impl Drop for Watch {
    fn drop(&mut self) {
        self.shared.slot().quit = true;
        self.shared.wake.notify_all();
        if let Some(thread) = self.thread.take() {
            // Its panic was printed; there is nothing to add.
            let _ = thread.join();
        }
    }
}

fn work(shared: &Shared, news: &Sender<(u64, DiskNews)>, wake: &dyn Fn()) {
    let mut slot = shared.slot();
    loop {
        if slot.quit {
            return;
        }
        let closely = std::mem::take(&mut slot.closely);
        if let Some(mut watched) = slot.watched.clone() {
            let round = slot.round;
            drop(slot);
            let found = look_at(&mut watched, closely);
            slot = shared.slot();
            if slot.round != round {
                continue;
            }
            slot.watched = Some(watched);
            if let Some(found) = found {
                // The window may be closing.
                let _ = news.send((round, found));
                wake();
            }
        }
        if slot.quit || slot.closely {
            continue;
        }
        slot = match slot.watched {
            Some(_) => {
                let waited = shared.wake.wait_timeout(slot, PERIOD);
                waited.unwrap_or_else(PoisonError::into_inner).0
            }
            None => shared
                .wake
                .wait(slot)
                .unwrap_or_else(PoisonError::into_inner),
        };
    }
}

/// Looks at the file; news is told once.
fn look_at(watched: &mut Watched, closely: bool) -> Option<DiskNews> {
    let stamp = std::fs::metadata(&watched.path)
        .and_then(|metadata| Ok((metadata.modified()?, metadata.len())));
    let found = match stamp {
        Err(error) if error.kind() == std::io::ErrorKind::NotFound => {
            watched.stamp = None;
            Some(DiskNews::Gone)
        }
        // Neither gone nor readable, such as a network drive that is away: no news yet.
        Err(_) => return None,
        Ok(stamp) if !closely && watched.stamp == Some(stamp) => return None,
        Ok(stamp) => {
            let Ok(bytes) = std::fs::read(&watched.path) else {
                return None;
            };
            watched.stamp = Some(stamp);
            (bytes != watched.text.as_bytes()).then_some(DiskNews::Changed)
        }
    };
    let fresh = found != watched.told || (found == Some(DiskNews::Changed) && !closely);
    watched.told = found;
    found.filter(|_| fresh)
}

#[cfg(test)]
mod tests {
    use super::*;
    use std::time::Instant;

    fn watched(path: &Path) -> Watched {
        Watched {
            path: path.to_owned(),
            text: "(a)".into(),
            stamp: None,
            told: None,
        }
    }

    #[test]
    fn changes_and_removal_are_told_once() {
        let folder = tempfile::tempdir().unwrap();
        let path = folder.path().join("a.circuit.ron");
        std::fs::write(&path, "(a)").unwrap();
        let mut watched = watched(&path);
        assert_eq!(look_at(&mut watched, false), None, "as known");
        std::fs::write(&path, "(other)").unwrap();
        assert_eq!(
            look_at(&mut watched, false),
            Some(DiskNews::Changed),
            "changed"
        );
        assert_eq!(look_at(&mut watched, false), None, "told already");
        std::fs::remove_file(&path).unwrap();
        assert_eq!(look_at(&mut watched, false), Some(DiskNews::Gone), "gone");
        assert_eq!(look_at(&mut watched, true), None, "told already");
        std::fs::write(&path, "(a)").unwrap();
        assert_eq!(look_at(&mut watched, false), None, "back as it was");
    }

    #[test]
    fn a_text_of_the_same_time_and_size_is_found_by_looking_closely() {
        let folder = tempfile::tempdir().unwrap();
        let path = folder.path().join("a.circuit.ron");
        std::fs::write(&path, "(a)").unwrap();
        let time = std::fs::metadata(&path).unwrap().modified().unwrap();
        let mut watched = watched(&path);
        assert_eq!(look_at(&mut watched, false), None, "as known");
        std::fs::write(&path, "(b)").unwrap();
        let file = std::fs::File::options().write(true).open(&path).unwrap();
        file.set_modified(time).unwrap();
        assert_eq!(look_at(&mut watched, false), None, "same time and size");
        assert_eq!(
            look_at(&mut watched, true),
            Some(DiskNews::Changed),
            "closely"
        );
        assert_eq!(look_at(&mut watched, true), None, "told already");
    }

    #[test]
    fn the_thread_tells_of_the_present_file_alone() {
        let folder = tempfile::tempdir().unwrap();
        let path = folder.path().join("a.circuit.ron");
        let (sender, woken) = channel();
        let watch = Watch::start(move || sender.send(()).unwrap_or(())).unwrap();
        watch.watch(Some((&path, "(a)".into())));
        woken.recv_timeout(Duration::from_secs(20)).unwrap();
        assert_eq!(watch.news(), Some(DiskNews::Gone), "there is none");
        std::fs::write(&path, "(a)").unwrap();
        watch.watch(Some((&path, "(a)".into())));
        watch.look();
        let begun = Instant::now();
        std::fs::write(&path, "(changed)").unwrap();
        watch.look();
        woken.recv_timeout(Duration::from_secs(20)).unwrap();
        assert_eq!(
            watch.news(),
            Some(DiskNews::Changed),
            "after {:?}",
            begun.elapsed()
        );
        watch.watch(None);
        assert_eq!(watch.news(), None, "nothing is watched");
    }
}
