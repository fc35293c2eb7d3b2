//! Files around the circuit: settings that are kept, files used lately, questions for paths.

pub(crate) mod ask_path;
mod home;
mod in_place;
mod kept;
mod recent;
mod unsaved;
mod watch;
pub(crate) mod words;

use std::path::{Path, PathBuf};

use std::sync::Arc;

use egui::Context;

pub use home::Home;
pub(crate) use in_place::{Written, written};
pub use kept::{Kept, WindowPlace};
pub(crate) use recent::RecentFile;
pub(crate) use unsaved::{Note, Snapshot};
pub(crate) use watch::DiskNews;

use ask_path::{Answered, AskPath, Asking, PathDialog, desktop_asks};
use helmsplit_scenario::FileError;
use unsaved::{Keeper, Offer, offers};
use watch::Watch;

use crate::document::Document;

/// What the app knows of files beside its circuit.
pub(crate) struct Files {
    /// Where things are kept; `None` keeps nothing, as in tests.
    home: Option<Home>,
    kept: Kept,
    recent: Vec<RecentFile>,
    /// Whether the desktop has a dialog for paths.
    desktop: bool,
    asking: Option<Asking>,
    keeper: Option<Keeper>,
    /// The change of the circuit that was kept last.
    kept_change: Option<(u64, bool)>,
    watch: Option<Watch>,
    /// The text of the file being watched.
    watched: Option<Arc<str>>,
    offers: Vec<Offer>,
}

/// How a question for a path is put.
pub(crate) enum Put {
    /// By the desktop; the window waits.
    ByDesktop,
    /// By our own dialog.
    Own(Box<PathDialog>),
}

impl Files {
    /// Files that are kept at `home`, as they were left. `wake` is called when there is news; the
    /// second value tells what does not work.
    pub(crate) fn new(
        home: Option<Home>,
        kept: Kept,
        wake: impl Fn() + Clone + Send + 'static,
    ) -> (Self, Vec<String>) {
        let mut problems = Vec::new();
        let mut files = Self {
            desktop: home.is_some() && desktop_asks(),
            home,
            kept,
            recent: Vec::new(),
            asking: None,
            keeper: None,
            kept_change: None,
            watch: None,
            watched: None,
            offers: Vec::new(),
        };
        match Watch::start(wake.clone()) {
            Ok(watch) => files.watch = Some(watch),
            Err(error) => problems.push(format!("Changes of files go unnoticed: {error}")),
        }
        if let Some(home) = &files.home {
            let folder = home.unsaved_folder();
            let unread;
            (files.offers, unread) = offers(&folder);
            problems.extend(
                unread
                    .iter()
                    .map(|one| format!("Unsaved changes do not read: {one}")),
            );
            match Keeper::start(&folder, wake) {
                Ok(keeper) => files.keeper = Some(keeper),
                Err(error) => problems.push(format!(
                    "Unsaved changes are not kept in {}: {error}",
                    folder.display()
                )),
            }
        }
        files.refresh();
        (files, problems)
    }

    /// Another circuit took the place of the one before.
    pub(crate) fn new_document(&mut self) {
        self.kept_change = None;
    }

    /// Keeps a circuit that is not saved, and what is known of its file; gives news of that file
    /// and trouble with keeping.
    pub(crate) fn follow(&mut self, document: &Document) -> (Option<DiskNews>, Option<String>) {
        let change = (document.revision(), document.is_edited());
        if self.kept_change != Some(change) {
            self.kept_change = Some(change);
            match &self.keeper {
                Some(keeper) if change.1 => keeper.keep(document.snapshot()),
                Some(keeper) => keeper.forget(),
                None => {}
            }
        }
        let file = document.known_file();
        let text = file.as_ref().map(|(_, text)| Arc::clone(text));
        let same = match (&self.watched, &text) {
            (Some(before), Some(now)) => Arc::ptr_eq(before, now),
            (before, now) => before.is_none() && now.is_none(),
        };
        let mut news = None;
        if let Some(watch) = &self.watch {
            if same {
                news = watch.news();
            } else {
                watch.watch(file);
            }
        }
        self.watched = text;
        let trouble = self.keeper.as_ref().and_then(Keeper::trouble);
        (news, trouble)
    }

    /// The window got the attention of the user: looks again what is there.
    pub(crate) fn look(&mut self) {
        self.refresh();
        if let Some(watch) = &self.watch {
            watch.look();
        }
    }

    /// Circuits that earlier windows did not save.
    pub(crate) fn offers(&self) -> &[Offer] {
        &self.offers
    }

    /// An offer was restored and is kept by this window now; the note of the one before goes.
    ///
    /// # Errors
    /// A sentence when it stays.
    pub(crate) fn restored(&mut self, offer: usize, document: &Document) -> Result<(), String> {
        self.new_document();
        let _ = self.follow(document);
        if let Some(keeper) = &self.keeper {
            keeper.settle();
            // Without a note of our own, the old one is all there is.
            if !keeper.file().exists() {
                return Ok(());
            }
        }
        self.discard(offer)
    }

    /// Nobody wants an offer.
    ///
    /// # Errors
    /// A sentence when its note stays.
    pub(crate) fn discard(&mut self, offer: usize) -> Result<(), String> {
        if offer < self.offers.len() {
            self.offers.remove(offer).remove()
        } else {
            Ok(())
        }
    }

    /// The window is closed in order: nothing is unsaved any more.
    pub(crate) fn closed(&self) {
        if let Some(keeper) = &self.keeper {
            keeper.forget();
            keeper.settle();
        }
    }

    /// Changes what is kept. Another window of ours may have changed it since, so it is read
    /// again first.
    ///
    /// # Errors
    /// [`FileError`] if it cannot be written; the change holds until the end then.
    pub(crate) fn keep(&mut self, change: impl FnOnce(&mut Kept)) -> Result<(), FileError> {
        let Some(home) = &self.home else {
            change(&mut self.kept);
            self.refresh();
            return Ok(());
        };
        let file = home.settings_file();
        if let Ok(Some(kept)) = Kept::read(&file) {
            self.kept = kept;
        }
        let before = self.kept.clone();
        change(&mut self.kept);
        let result = if self.kept == before {
            Ok(())
        } else {
            self.kept.write(&file)
        };
        self.refresh();
        result
    }

    /// Looks again which files are there.
    pub(crate) fn refresh(&mut self) {
        self.recent = self.kept.recent.files();
    }

    /// Files used lately, the latest first.
    pub(crate) fn recent(&self) -> &[RecentFile] {
        &self.recent
    }

    /// Where things are kept.
    pub(crate) fn home(&self) -> Option<&Home> {
        self.home.as_ref()
    }

    /// The folder to look for files in first.
    pub(crate) fn folder(&self) -> PathBuf {
        let last = self.kept.folder.as_deref().filter(|folder| folder.is_dir());
        let current = || std::env::current_dir().unwrap_or_else(|_| PathBuf::from("/"));
        last.map_or_else(current, Path::to_owned)
    }

    /// Puts a question for a path.
    pub(crate) fn ask(&mut self, ask: AskPath, context: &Context) -> Put {
        let folder = self.folder();
        let ask = if self.desktop {
            let wake = context.clone();
            match Asking::begin(ask, &folder, move || wake.request_repaint()) {
                Ok(asking) => {
                    self.asking = Some(asking);
                    return Put::ByDesktop;
                }
                Err(ask) => ask,
            }
        } else {
            ask
        };
        Put::Own(Box::new(PathDialog::new(ask, &folder)))
    }

    /// The answer of the desktop's dialog, if it is open.
    pub(crate) fn answer(&mut self) -> Option<Answered> {
        let answer = self.asking.as_ref()?.answer();
        if !matches!(answer, Answered::Waiting) {
            self.asking = None;
        }
        Some(answer)
    }

    /// Leaves the desktop's dialog alone; what it says no longer counts. Our own takes over the
    /// question.
    pub(crate) fn own_dialog(&mut self) -> Option<Box<PathDialog>> {
        let asking = self.asking.take()?;
        let ask = asking.question().clone();
        Some(Box::new(PathDialog::new(ask, &self.folder())))
    }

    /// The desktop has no dialog after all.
    pub(crate) fn desktop_failed(&mut self) {
        self.desktop = false;
    }

    /// The question is withdrawn.
    pub(crate) fn withdraw(&mut self) {
        self.asking = None;
    }
}
