//! From what was typed into the path field to a path.

use std::path::{Path, PathBuf};

use super::{FileKind, Purpose};

/// What a typed text stands for.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(super) enum Typed {
    /// A folder to look into.
    Folder(PathBuf),
    /// The file that was asked for.
    File(PathBuf),
    /// A file to write that is there already.
    Occupied(PathBuf),
    /// Neither; the sentence says why.
    Nothing(String),
}

/// Reads a typed text; `folder` is the one being shown.
pub(super) fn typed(text: &str, folder: &Path, purpose: Purpose, kind: FileKind) -> Typed {
    let text = text.trim();
    if text.is_empty() {
        return Typed::Nothing("Type the name of a file, or choose one.".to_owned());
    }
    let path = folder.join(from_home(text));
    if path.is_dir() {
        return Typed::Folder(path);
    }
    match purpose {
        Purpose::Open if path.is_file() => Typed::File(path),
        Purpose::Open => Typed::Nothing(format!("There is no file {}.", path.display())),
        Purpose::Save => to_write(with_ending(path, kind)),
    }
}

fn to_write(path: PathBuf) -> Typed {
    match path.parent() {
        Some(parent) if !parent.is_dir() => {
            Typed::Nothing(format!("There is no folder {}.", parent.display()))
        }
        _ if path.is_dir() => Typed::Folder(path),
        _ if path.exists() => Typed::Occupied(path),
        _ => Typed::File(path),
    }
}

/// `~` stands for the home folder, as in a shell.
fn from_home(text: &str) -> PathBuf {
    let rest = match text.strip_prefix('~') {
        Some(rest) if rest.is_empty() || rest.starts_with(['/', '\\']) => rest,
        _ => return PathBuf::from(text),
    };
    match std::env::home_dir() {
        Some(home) => home.join(rest.trim_start_matches(['/', '\\'])),
        None => PathBuf::from(text),
    }
}

/// The path with the ending of its kind, unless it has that or at least the last part of it:
/// `mine.ron` stays, for somebody meant it.
pub(crate) fn with_ending(path: PathBuf, kind: FileKind) -> PathBuf {
    let Some(name) = path.file_name().and_then(|name| name.to_str()) else {
        return path;
    };
    let last = kind.ending.rsplit('.').next().unwrap_or(kind.ending);
    let last = FileKind {
        name: kind.name,
        ending: last,
    };
    if kind.holds(name) || last.holds(name) {
        return path;
    }
    let name = format!("{}.{}", name.trim_end_matches('.'), kind.ending);
    path.with_file_name(name)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn names_get_their_ending() {
        for (name, expected) in [
            ("mine", "mine.circuit.ron"),
            ("mine 2.5 mm", "mine 2.5 mm.circuit.ron"),
            ("mine.", "mine.circuit.ron"),
            ("mine.ron", "mine.ron"),
            ("mine.circuit.ron", "mine.circuit.ron"),
        ] {
            let path = with_ending(PathBuf::from("/a").join(name), FileKind::CIRCUIT);
            assert_eq!(path, Path::new("/a").join(expected), "{name}");
        }
    }

    #[test]
    fn texts_are_folders_files_or_nothing() {
        let folder = tempfile::tempdir().unwrap();
        let at = |name: &str| folder.path().join(name);
        std::fs::create_dir(at("older")).unwrap();
        std::fs::write(at("a.circuit.ron"), "()").unwrap();
        let asked = |text: &str, purpose| typed(text, folder.path(), purpose, FileKind::CIRCUIT);
        let file = Typed::File(at("a.circuit.ron"));
        assert_eq!(asked(" a.circuit.ron ", Purpose::Open), file, "relative");
        let whole = at("a.circuit.ron").display().to_string();
        assert_eq!(asked(&whole, Purpose::Open), file, "absolute");
        assert_eq!(
            asked("older", Purpose::Save),
            Typed::Folder(at("older")),
            "a folder"
        );
        assert_eq!(
            asked("a", Purpose::Save),
            Typed::Occupied(at("a.circuit.ron")),
            "the ending counts"
        );
        assert_eq!(
            asked("b", Purpose::Save),
            Typed::File(at("b.circuit.ron")),
            "a new one"
        );
        for (text, purpose, part) in [
            ("b", Purpose::Open, "There is no file"),
            ("none/b", Purpose::Save, "There is no folder"),
            ("  ", Purpose::Save, "Type the name"),
        ] {
            let Typed::Nothing(sentence) = asked(text, purpose) else {
                panic!("{text} is something");
            };
            assert!(sentence.contains(part), "{text}: {sentence}");
        }
    }
}
