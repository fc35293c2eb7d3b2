//! The dialog of the desktop, on a thread of its own.

use std::path::{Path, PathBuf};
use std::sync::mpsc::{Receiver, TryRecvError, channel};
use std::time::{Duration, Instant};

use super::{AskPath, Purpose};

/// Nobody cancels faster: an answer without a path that comes sooner means that there was no
/// dialog to answer.
const SHOWN: Duration = Duration::from_millis(300);

/// Whether the desktop has a dialog to ask with.
///
/// On Linux that is the file chooser of the desktop portal: a session bus, the portal's service
/// on it, and a back end that chooses files (XDG Desktop Portal, file
/// `share/xdg-desktop-portal/portals/*.portal`). On macOS its dialog would have to run on the
/// window's own thread, so ours asks there.
pub(crate) fn desktop_asks() -> bool {
    if cfg!(target_os = "windows") {
        return true;
    }
    if !cfg!(target_os = "linux") {
        return false;
    }
    let variable = |name: &str| std::env::var(name).ok().filter(|value| !value.is_empty());
    let bus = variable("DBUS_SESSION_BUS_ADDRESS").is_some()
        || variable("XDG_RUNTIME_DIR")
            .is_some_and(|folder| Path::new(&folder).join("bus").exists());
    let shared = variable("XDG_DATA_DIRS").unwrap_or_else(|| "/usr/local/share:/usr/share".into());
    let mut folders: Vec<PathBuf> = shared.split(':').map(PathBuf::from).collect();
    folders.extend(variable("XDG_DATA_HOME").map(PathBuf::from));
    folders.extend(std::env::home_dir().map(|home| home.join(".local/share")));
    bus && has_chooser(&folders)
}

/// Whether a portal with a file chooser is installed in one of the data folders.
fn has_chooser(folders: &[PathBuf]) -> bool {
    let service = "dbus-1/services/org.freedesktop.portal.Desktop.service";
    let chooses = |file: PathBuf| {
        let text = std::fs::read_to_string(file).unwrap_or_default();
        text.contains("org.freedesktop.impl.portal.FileChooser")
    };
    let backed = |folder: &PathBuf| {
        let portals = std::fs::read_dir(folder.join("xdg-desktop-portal/portals"));
        portals.is_ok_and(|mut files| files.any(|file| file.is_ok_and(|file| chooses(file.path()))))
    };
    folders.iter().any(|folder| folder.join(service).exists()) && folders.iter().any(backed)
}

/// The desktop's dialog while it is open.
#[derive(Debug)]
pub(crate) struct Asking {
    ask: AskPath,
    answer: Receiver<Option<PathBuf>>,
    begun: Instant,
}

/// How the desktop's dialog ended.
#[derive(Debug)]
pub(crate) enum Answered {
    /// Not yet.
    Waiting,
    /// With a path.
    Path(AskPath, PathBuf),
    /// Without one: the user does not want to.
    Cancelled,
    /// It never opened; our own dialog asks instead.
    NotShown(AskPath),
}

impl Asking {
    /// Opens the dialog, at the folder of the proposal or else at `folder`; `wake` is called when
    /// it has closed.
    ///
    /// # Errors
    /// The question comes back when the system has no thread.
    pub(crate) fn begin(
        ask: AskPath,
        folder: &Path,
        wake: impl FnOnce() + Send + 'static,
    ) -> Result<Self, AskPath> {
        let (sender, answer) = channel();
        let (asked, folder) = (ask.clone(), folder.to_owned());
        let thread = std::thread::Builder::new().name("file dialog".to_owned());
        let spawned = thread.spawn(move || {
            // Nobody listens any more if the user went over to our own dialog.
            let _ = sender.send(show(&asked, &folder));
            wake();
        });
        match spawned {
            Ok(_) => Ok(Self {
                ask,
                answer,
                begun: Instant::now(),
            }),
            Err(_) => Err(ask),
        }
    }

    /// What was asked.
    pub(crate) fn question(&self) -> &AskPath {
        &self.ask
    }

    /// The answer, if there is one.
    pub(crate) fn answer(&self) -> Answered {
        match self.answer.try_recv() {
            Err(TryRecvError::Empty) => Answered::Waiting,
            Ok(Some(path)) => Answered::Path(self.ask.clone(), path),
            Ok(None) if self.begun.elapsed() >= SHOWN => Answered::Cancelled,
            Ok(None) | Err(TryRecvError::Disconnected) => Answered::NotShown(self.ask.clone()),
        }
    }
}

fn show(ask: &AskPath, folder: &Path) -> Option<PathBuf> {
    let own = ask.proposal.parent().filter(|own| own.is_dir());
    let mut dialog = rfd::FileDialog::new()
        .set_title(ask.title)
        .add_filter(ask.kind.name, &[ask.kind.ending])
        .add_filter("All files", &["*"])
        .set_directory(own.unwrap_or(folder));
    if let Some(name) = ask.proposal.file_name() {
        dialog = dialog.set_file_name(name.to_string_lossy());
    }
    match ask.purpose {
        Purpose::Open => dialog.pick_file(),
        Purpose::Save => dialog.save_file(),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_portal_counts_only_with_a_back_end_that_chooses_files() {
        let folder = tempfile::tempdir().unwrap();
        let folders = [folder.path().to_owned()];
        let write = |name: &str, text: &str| {
            let file = folder.path().join(name);
            std::fs::create_dir_all(file.parent().unwrap()).unwrap();
            std::fs::write(file, text).unwrap();
        };
        assert!(!has_chooser(&folders), "nothing installed");
        write("dbus-1/services/org.freedesktop.portal.Desktop.service", "");
        assert!(!has_chooser(&folders), "no back end");
        let portal = "xdg-desktop-portal/portals/some.portal";
        write(
            portal,
            "[portal]\nInterfaces=org.freedesktop.impl.portal.Settings;\n",
        );
        assert!(!has_chooser(&folders), "a back end for other things");
        write(
            portal,
            "[portal]\nInterfaces=org.freedesktop.impl.portal.FileChooser;\n",
        );
        assert!(has_chooser(&folders), "a back end that chooses files");
    }
}
