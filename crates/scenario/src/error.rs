//! Why a file could not be read or written.

use std::io;
use std::path::{Path, PathBuf};

use thiserror::Error;

use crate::document::Place;
use crate::finding::Finding;

/// Files above this size are not read: a circuit has a few kilobytes.
pub const MAX_FILE_BYTES: u64 = 4 * 1024 * 1024;

/// A file that cannot be used. The text names the file and, where there is one, the place.
#[derive(Debug, Error)]
#[non_exhaustive]
pub enum FileError {
    /// There is no such file.
    #[error("{}: {}", .path.display(), self.message())]
    Missing {
        /// The file.
        path: PathBuf,
    },
    /// It is a folder.
    #[error("{}: {}", .path.display(), self.message())]
    Folder {
        /// The folder.
        path: PathBuf,
    },
    /// It is a device, a pipe or something else without content of its own.
    #[error("{}: {}", .path.display(), self.message())]
    NotAFile {
        /// The thing.
        path: PathBuf,
    },
    /// The user may not read or write it.
    #[error("{}: {}", .path.display(), self.message())]
    NoPermission {
        /// The file.
        path: PathBuf,
    },
    /// The system could not read it.
    #[error("{}: {}", .path.display(), self.message())]
    Unreadable {
        /// The file.
        path: PathBuf,
        /// What the system says.
        source: io::Error,
    },
    /// Above [`MAX_FILE_BYTES`].
    #[error("{}: {}", .path.display(), self.message())]
    TooLarge {
        /// The file.
        path: PathBuf,
        /// Its size in bytes, as far as known.
        bytes: u64,
    },
    /// Not text in UTF-8.
    #[error("{}:{place}: {}", .path.display(), self.message())]
    NotUtf8 {
        /// The file.
        path: PathBuf,
        /// The first byte that is no text.
        place: Place,
        /// The count of good bytes before it.
        byte: usize,
        /// Whether the file begins as UTF-16 does.
        utf16: bool,
    },
    /// Nothing in it but blanks and comments.
    #[error("{}: {}", .path.display(), self.message())]
    Empty {
        /// The file.
        path: PathBuf,
    },
    /// It ends inside a bracket, a text or a comment.
    #[error("{}:{place}: {}", .path.display(), self.message())]
    Truncated {
        /// The file.
        path: PathBuf,
        /// Where the unclosed part begins.
        place: Place,
        /// What is unclosed: a bracket in backquotes, `text` or `comment`.
        what: String,
        /// The line of a bracket that more likely lacks its partner.
        suspect_line: Option<usize>,
    },
    /// Brackets within brackets beyond any need.
    #[error("{}:{place}: {}", .path.display(), self.message())]
    TooDeep {
        /// The file.
        path: PathBuf,
        /// The bracket that goes too far.
        place: Place,
        /// The number of levels allowed.
        limit: usize,
    },
    /// More values than any circuit has.
    #[error("{}: {}", .path.display(), self.message())]
    TooMany {
        /// The file.
        path: PathBuf,
        /// The number of values allowed.
        limit: usize,
    },
    /// Not RON.
    #[error("{}:{place}: {message}", .path.display())]
    Syntax {
        /// The file.
        path: PathBuf,
        /// Where reading stopped.
        place: Place,
        /// What is wrong or expected there.
        message: String,
    },
    /// RON, but not one section in brackets.
    #[error("{}:{place}: {}", .path.display(), self.message())]
    NotASection {
        /// The file.
        path: PathBuf,
        /// Where the value begins.
        place: Place,
        /// What the file holds instead.
        found: &'static str,
    },
    /// An existing file that is marked read-only was to be replaced.
    #[error("{}: {}", .path.display(), self.message())]
    ReadOnly {
        /// The file.
        path: PathBuf,
    },
    /// The system could not write it; a file that was there before is untouched.
    #[error("{}: {}", .path.display(), self.message())]
    Unwritable {
        /// The file.
        path: PathBuf,
        /// What the system says.
        source: io::Error,
    },
}

impl FileError {
    pub(crate) fn from_read(path: &Path, source: io::Error) -> Self {
        let path = path.to_owned();
        match source.kind() {
            io::ErrorKind::NotFound => Self::Missing { path },
            io::ErrorKind::PermissionDenied => Self::NoPermission { path },
            io::ErrorKind::IsADirectory => Self::Folder { path },
            _ => Self::Unreadable { path, source },
        }
    }

    pub(crate) fn from_write(path: &Path, source: io::Error) -> Self {
        let path = path.to_owned();
        match source.kind() {
            io::ErrorKind::PermissionDenied => Self::NoPermission { path },
            io::ErrorKind::IsADirectory => Self::Folder { path },
            _ => Self::Unwritable { path, source },
        }
    }

    /// What is wrong, without the file and the place.
    #[must_use]
    pub fn message(&self) -> String {
        match self {
            Self::Missing { .. } => "there is no such file".to_owned(),
            Self::Folder { .. } => "this is a folder, but a file is wanted".to_owned(),
            Self::NotAFile { .. } => "this is a device or a pipe, but a file is wanted".to_owned(),
            Self::NoPermission { .. } => "there is no permission for this file".to_owned(),
            Self::Unreadable { source, .. } => format!("the file cannot be read: {source}"),
            Self::TooLarge { bytes, .. } => format!(
                "the file has {bytes} bytes; a circuit has a few thousand, and above {MAX_FILE_BYTES} it is not read"
            ),
            Self::NotUtf8 { byte, utf16, .. } => {
                let hint = if *utf16 {
                    "; it looks like UTF-16: save it as UTF-8"
                } else {
                    "; save it as UTF-8"
                };
                format!("the file is not UTF-8 text (after {byte} bytes){hint}")
            }
            Self::Empty { .. } => "the file is empty".to_owned(),
            Self::Truncated {
                place,
                what,
                suspect_line,
                ..
            } => {
                let what = if what.starts_with('`') {
                    what.clone()
                } else {
                    format!("the {what}")
                };
                let line = place.line;
                let suspect = suspect_line.map_or_else(String::new, |line| {
                    format!("; by the indentation, the bracket opened in line {line} was forgotten")
                });
                format!("the file ends before {what} of line {line} is closed{suspect}")
            }
            Self::TooDeep { limit, .. } => format!("brackets are nested more than {limit} deep"),
            Self::TooMany { limit, .. } => format!("the file has more than {limit} values"),
            Self::Syntax { message, .. } => message.clone(),
            Self::NotASection { found, .. } => {
                format!("a circuit file is one section `( ... )`, but this is {found}")
            }
            Self::ReadOnly { .. } => "the file is read-only and was left as it is".to_owned(),
            Self::Unwritable { source, .. } => format!("the file cannot be written: {source}"),
        }
    }

    /// The place in the file, where there is one.
    #[must_use]
    pub fn place(&self) -> Option<Place> {
        match self {
            Self::NotUtf8 { place, .. }
            | Self::Truncated { place, .. }
            | Self::TooDeep { place, .. }
            | Self::Syntax { place, .. }
            | Self::NotASection { place, .. } => Some(*place),
            Self::Missing { .. }
            | Self::Folder { .. }
            | Self::NotAFile { .. }
            | Self::NoPermission { .. }
            | Self::Unreadable { .. }
            | Self::TooLarge { .. }
            | Self::Empty { .. }
            | Self::TooMany { .. }
            | Self::ReadOnly { .. }
            | Self::Unwritable { .. } => None,
        }
    }

    /// The same as a finding, for reports that hold nothing else.
    #[must_use]
    pub fn to_finding(&self) -> Finding {
        let finding = Finding::error("", self.message(), "");
        match self.place() {
            Some(place) => finding.at(place),
            None => finding,
        }
    }
}
