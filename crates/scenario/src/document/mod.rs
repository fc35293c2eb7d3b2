//! A circuit file as read: its text, and the tree of its values with their places.
//!
//! This layer knows RON and files, but no circuit: which keys exist and what their values mean is
//! the business of the parameter table.

mod brackets;
pub(crate) mod lexer;
mod node;
mod place;
mod reader;
mod syntax;

use std::collections::BTreeMap;
use std::fs::{self, File};
use std::io::Read as _;
use std::ops::Range;
use std::path::{Path, PathBuf};

use crate::error::{FileError, MAX_FILE_BYTES};
use crate::finding::Finding;
use lexer::{Lexer, TokenKind};
pub use node::{Field, Key, Kind, Node};
use place::Lines;
pub use place::Place;
use reader::NoTree;
use syntax::Fault;

/// A RON file with one section at its root.
///
/// # Examples
/// ```
/// use helmsplit_scenario::document::Document;
///
/// let text = "(valve: (spool_diameter: \"20 mm\")) // invented";
/// let document = Document::from_text("carrier.circuit.ron", text)?;
/// let node = document.get("valve.spool_diameter").expect("it is there");
/// assert_eq!(node.text(), Some("20 mm"));
/// assert_eq!(document.place(node.span.start).to_string(), "1:26");
/// # Ok::<(), helmsplit_scenario::FileError>(())
/// ```
#[derive(Debug, Clone, PartialEq)]
pub struct Document {
    path: PathBuf,
    source: String,
    lines: Lines,
    root: Node,
}

impl Document {
    /// Reads a file.
    ///
    /// # Errors
    /// [`FileError`] when the file is missing, a folder, forbidden, above 4 MB (it is then not
    /// read at all), not UTF-8, empty, cut off, nested too deep, or not RON.
    pub fn read(path: impl AsRef<Path>) -> Result<Self, FileError> {
        let path = path.as_ref();
        let text = read_text(path)?;
        Self::from_text(path, text)
    }

    /// Reads a text; `path` names it in messages.
    ///
    /// # Errors
    /// As [`Document::read`], for all that can be wrong with a text.
    pub fn from_text(path: impl Into<PathBuf>, text: impl Into<String>) -> Result<Self, FileError> {
        let path = path.into();
        let mut source: String = text.into();
        if source.len() as u64 > MAX_FILE_BYTES {
            return Err(FileError::TooLarge {
                path,
                bytes: source.len() as u64,
            });
        }
        // Some editors begin a file with an invisible mark.
        if source.starts_with('\u{feff}') {
            source.remove(0);
        }
        let comment = TokenKind::Comment { closed: true };
        if Lexer::new(&source).all(|token| token.kind == comment) {
            return Err(FileError::Empty { path });
        }
        let lines = Lines::of(&source);
        let limit = reader::MAX_DEPTH;
        if let Some(at) = brackets::too_deep(&source, limit) {
            return Err(FileError::TooDeep {
                path,
                place: lines.place(&source, at),
                limit,
            });
        }
        let root = match reader::read_tree(&source) {
            Ok(root) => root,
            Err(NoTree::TooMany) => {
                return Err(FileError::TooMany {
                    path,
                    limit: reader::MAX_NODES,
                });
            }
            Err(NoTree::Syntax(error)) => {
                let fault = syntax::fault(&source, &lines, &error);
                return Err(file_error(path, &source, &lines, fault));
            }
        };
        if root.fields().is_none() {
            let place = lines.place(&source, root.span.start);
            return Err(FileError::NotASection {
                path,
                place,
                found: root.describe(),
            });
        }
        Ok(Self {
            path,
            source,
            lines,
            root,
        })
    }

    /// The name of the file, for messages.
    #[must_use]
    pub fn path(&self) -> &Path {
        &self.path
    }

    /// The whole text.
    #[must_use]
    pub fn source(&self) -> &str {
        &self.source
    }

    /// The section at the root.
    #[must_use]
    pub fn root(&self) -> &Node {
        &self.root
    }

    /// Line and column of a byte of the text.
    #[must_use]
    pub fn place(&self, offset: usize) -> Place {
        self.lines.place(&self.source, offset)
    }

    /// A value as it stands in the text: quotes, escapes and comments inside it included.
    #[must_use]
    pub fn written(&self, node: &Node) -> &str {
        self.source.get(node.span.clone()).unwrap_or("")
    }

    /// The value at a path of keys, such as `valve.spool_diameter`.
    #[must_use]
    pub fn get(&self, path: &str) -> Option<&Node> {
        path.split('.')
            .try_fold(&self.root, |node, key| node.get(key))
    }

    /// One finding for each key that a section gives again.
    #[must_use]
    pub fn doubled_keys(&self) -> Vec<Finding> {
        let mut findings = Vec::new();
        self.collect_doubled(&self.root, "", &mut findings);
        findings
    }

    fn collect_doubled(&self, node: &Node, path: &str, findings: &mut Vec<Finding>) {
        let mut seen: BTreeMap<&str, Range<usize>> = BTreeMap::new();
        for Field { key, value } in node.fields().unwrap_or(&[]) {
            let dot = if path.is_empty() { "" } else { "." };
            let path = format!("{path}{dot}{}", key.text);
            if let Some(first) = seen.get(key.text.as_str()) {
                let line = self.place(first.start).line;
                let message = format!("this key was already given in line {line}");
                let finding = Finding::error(&path, message, "keep one of the two");
                findings.push(finding.at(self.place(key.span.start)));
            } else {
                seen.insert(&key.text, key.span.clone());
            }
            self.collect_doubled(value, &path, findings);
        }
        for (index, element) in node.elements().unwrap_or(&[]).iter().enumerate() {
            self.collect_doubled(element, &format!("{path}[{index}]"), findings);
        }
    }
}

fn file_error(path: PathBuf, source: &str, lines: &Lines, fault: Fault) -> FileError {
    let place = |offset| lines.place(source, offset);
    match fault {
        Fault::Truncated {
            open,
            what,
            suspect,
        } => {
            let suspect_line = suspect.map(|offset| place(offset).line);
            FileError::Truncated {
                path,
                place: place(open),
                what,
                suspect_line,
            }
        }
        Fault::TooDeep { at } => FileError::TooDeep {
            path,
            place: place(at),
            limit: reader::MAX_DEPTH,
        },
        Fault::Syntax { at, message } => FileError::Syntax {
            path,
            place: place(at),
            message,
        },
    }
}

/// Reads a file as UTF-8 without ever holding more than the limit.
fn read_text(path: &Path) -> Result<String, FileError> {
    let refused = |error| FileError::from_read(path, error);
    let metadata = fs::metadata(path).map_err(refused)?;
    let owned = path.to_owned();
    if metadata.is_dir() {
        return Err(FileError::Folder { path: owned });
    }
    if !metadata.is_file() {
        return Err(FileError::NotAFile { path: owned });
    }
    if metadata.len() > MAX_FILE_BYTES {
        return Err(FileError::TooLarge {
            path: owned,
            bytes: metadata.len(),
        });
    }
    let mut bytes = Vec::new();
    let file = File::open(path).map_err(refused)?;
    // The file may have grown since its size was asked.
    file.take(MAX_FILE_BYTES + 1)
        .read_to_end(&mut bytes)
        .map_err(refused)?;
    if bytes.len() as u64 > MAX_FILE_BYTES {
        return Err(FileError::TooLarge {
            path: owned,
            bytes: bytes.len() as u64,
        });
    }
    String::from_utf8(bytes).map_err(|error| not_utf8(owned, &error))
}

fn not_utf8(path: PathBuf, error: &std::string::FromUtf8Error) -> FileError {
    let byte = error.utf8_error().valid_up_to();
    let bytes = error.as_bytes();
    let good = String::from_utf8_lossy(&bytes[..byte]);
    let place = Lines::of(&good).place(&good, byte);
    let utf16 = bytes.starts_with(&[0xff, 0xfe]) || bytes.starts_with(&[0xfe, 0xff]);
    FileError::NotUtf8 {
        path,
        place,
        byte,
        utf16,
    }
}

#[cfg(test)]
mod tests;
