//! Saving without ever leaving half a file.

use std::fs::{self, File, Permissions};
use std::io::{self, Write as _};
use std::path::{Path, PathBuf};

use tempfile::{Builder, NamedTempFile};

use crate::error::FileError;

/// Writes `text` to `path` so that at every moment either the old or the new file is there whole.
///
/// The text goes to a new file in the same folder, is flushed to the disk, and then takes the old
/// name. The permissions of an existing file are kept, and a link is followed to its file.
///
/// # Errors
/// [`FileError`] when the path is a folder or no plain file, the existing file is read-only, or
/// the system refuses. The old file is then untouched.
pub fn save_atomically(path: impl AsRef<Path>, text: &str) -> Result<(), FileError> {
    save_bytes_atomically(path, text.as_bytes())
}

/// Writes `bytes` to `path` as [`save_atomically`] writes text.
///
/// # Errors
/// As those of [`save_atomically`].
pub fn save_bytes_atomically(path: impl AsRef<Path>, bytes: &[u8]) -> Result<(), FileError> {
    let path = path.as_ref();
    let (target, permissions) = target(path)?;
    let refused = |error: io::Error| FileError::from_write(path, error);
    // A bare file name has an empty parent, which stands for the current folder.
    let folder = target
        .parent()
        .filter(|folder| !folder.as_os_str().is_empty())
        .unwrap_or(Path::new("."));
    let mut file = new_file(folder).map_err(refused)?;
    file.write_all(bytes).map_err(refused)?;
    if let Some(permissions) = permissions {
        file.as_file()
            .set_permissions(permissions)
            .map_err(refused)?;
    }
    file.as_file().sync_all().map_err(refused)?;
    file.persist(&target)
        .map_err(|error| refused(error.error))?;
    sync_folder(folder).map_err(refused)
}

/// The file to replace, links resolved, with its permissions if it exists.
fn target(path: &Path) -> Result<(PathBuf, Option<Permissions>), FileError> {
    let owned = path.to_owned();
    let metadata = match fs::metadata(path) {
        Ok(metadata) => metadata,
        Err(error) if error.kind() == io::ErrorKind::NotFound => return Ok((owned, None)),
        Err(error) => return Err(FileError::from_write(path, error)),
    };
    if metadata.is_dir() {
        return Err(FileError::Folder { path: owned });
    }
    if !metadata.is_file() {
        return Err(FileError::NotAFile { path: owned });
    }
    if metadata.permissions().readonly() {
        return Err(FileError::ReadOnly { path: owned });
    }
    let target = fs::canonicalize(path).map_err(|error| FileError::from_write(path, error))?;
    Ok((target, Some(metadata.permissions())))
}

/// A hidden file beside the target, with the permissions any new file gets.
fn new_file(folder: &Path) -> io::Result<NamedTempFile> {
    let mut builder = Builder::new();
    builder.prefix(".helmsplit-").suffix(".part");
    #[cfg(unix)]
    {
        use std::os::unix::fs::PermissionsExt as _;
        // The system takes away what the user's mask forbids.
        builder.permissions(Permissions::from_mode(0o666));
    }
    builder.tempfile_in(folder)
}

/// Makes the new name itself last; only Unix opens folders.
fn sync_folder(folder: &Path) -> io::Result<()> {
    if cfg!(unix) {
        File::open(folder)?.sync_all()
    } else {
        Ok(())
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn names(folder: &Path) -> Vec<String> {
        let entries = fs::read_dir(folder).expect("a folder");
        let mut names: Vec<_> = entries
            .map(|entry| {
                entry
                    .expect("an entry")
                    .file_name()
                    .to_string_lossy()
                    .into_owned()
            })
            .collect();
        names.sort();
        names
    }

    #[test]
    fn a_new_and_an_old_file_are_written_whole() {
        let folder = tempfile::tempdir().expect("a folder");
        let path = folder.path().join("a.circuit.ron");
        save_atomically(&path, "(first: 1)\n").expect("saved");
        assert_eq!(
            fs::read_to_string(&path).expect("read"),
            "(first: 1)\n",
            "a new file"
        );
        save_atomically(&path, "(b: 2)").expect("saved");
        assert_eq!(
            fs::read_to_string(&path).expect("read"),
            "(b: 2)",
            "a shorter text leaves no rest"
        );
        assert_eq!(
            names(folder.path()),
            ["a.circuit.ron"],
            "nothing else is left behind"
        );
    }

    #[test]
    fn refusals_name_the_file_and_leave_it() {
        let folder = tempfile::tempdir().expect("a folder");
        let error = save_atomically(folder.path(), "x").expect_err("a folder");
        assert!(matches!(error, FileError::Folder { .. }), "{error}");
        let lost = folder.path().join("nowhere").join("a.ron");
        let error = save_atomically(&lost, "x").expect_err("no folder");
        assert!(
            error.to_string().starts_with(&lost.display().to_string()),
            "{error}"
        );
        let path = folder.path().join("fixed.ron");
        fs::write(&path, "old").expect("written");
        let mut permissions = fs::metadata(&path).expect("there").permissions();
        permissions.set_readonly(true);
        fs::set_permissions(&path, permissions).expect("marked");
        let error = save_atomically(&path, "new").expect_err("read-only");
        assert!(
            error
                .to_string()
                .ends_with("the file is read-only and was left as it is"),
            "{error}"
        );
        assert_eq!(fs::read_to_string(&path).expect("read"), "old", "untouched");
        assert_eq!(
            names(folder.path()),
            ["fixed.ron"],
            "nothing else is left behind"
        );
    }

    #[cfg(unix)]
    #[test]
    fn permissions_and_links_are_kept() {
        use std::os::unix::fs::{PermissionsExt as _, symlink};
        let folder = tempfile::tempdir().expect("a folder");
        let path = folder.path().join("a.ron");
        let link = folder.path().join("link.ron");
        fs::write(&path, "old").expect("written");
        fs::set_permissions(&path, Permissions::from_mode(0o640)).expect("set");
        symlink(&path, &link).expect("linked");
        save_atomically(&link, "new").expect("saved");
        let mode = fs::metadata(&path).expect("there").permissions().mode() & 0o777;
        assert_eq!(mode, 0o640, "the old permissions");
        assert_eq!(
            fs::read_to_string(&path).expect("read"),
            "new",
            "the file behind the link"
        );
        assert!(
            fs::symlink_metadata(&link).expect("there").is_symlink(),
            "the link is still one"
        );
        let plain = folder.path().join("plain.ron");
        let saved = folder.path().join("saved.ron");
        fs::write(&plain, "").expect("written");
        save_atomically(&saved, "").expect("saved");
        let mode = |path: &Path| fs::metadata(path).expect("there").permissions().mode();
        assert_eq!(
            mode(&saved),
            mode(&plain),
            "a new file gets what any new file gets"
        );
    }
}
