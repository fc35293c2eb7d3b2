//! Edits in place: what is not replaced stays as it is, comments and blanks included.

use std::ops::Range;

use thiserror::Error;

use super::literal::is_key;
use crate::document::lexer::{Lexer, TokenKind};
use crate::document::{Document, Node};

/// Bytes of a source and the text that takes their place.
pub type Edit = (Range<usize>, String);

/// Edits that do not fit the source or each other.
#[derive(Debug, Clone, PartialEq, Eq, Error)]
#[non_exhaustive]
pub enum EditError {
    /// Not inside the source, backwards, or through the middle of a character.
    #[error("bytes {} to {} are no part of the text", .range.start, .range.end)]
    Outside {
        /// The bytes that were to be replaced.
        range: Range<usize>,
    },
    /// Two edits replace the same bytes.
    #[error("two changes meet at byte {at}")]
    Overlap {
        /// The first byte both replace.
        at: usize,
    },
    /// A field was to be added to something that is no section.
    #[error("a field can only be added to a section")]
    NotASection,
    /// A key of other signs than letters, digits and `_`.
    #[error("{key:?} cannot be a key; keys have letters, digits and _")]
    InvalidKey {
        /// The key.
        key: String,
    },
}

/// Puts texts in the place of bytes of `source`, all at once. Edits may come in any order; of
/// insertions at one place the first given comes first.
///
/// # Errors
/// [`EditError::Outside`] and [`EditError::Overlap`]; nothing is changed then.
///
/// # Examples
/// ```
/// use helmsplit_scenario::document::Document;
/// use helmsplit_scenario::write::replace_values;
///
/// let document = Document::from_text("a.ron", "(bore: \"8 mm\" /* new hose */)")?;
/// let bore = document.get("bore").expect("it is there");
/// let text = replace_values(document.source(), vec![(bore.span.clone(), "\"10 mm\"".to_owned())])?;
/// assert_eq!(text, "(bore: \"10 mm\" /* new hose */)");
/// # Ok::<(), Box<dyn std::error::Error>>(())
/// ```
pub fn replace_values(source: &str, mut edits: Vec<Edit>) -> Result<String, EditError> {
    edits.sort_by_key(|(range, _)| (range.start, range.end));
    let mut text = String::with_capacity(source.len());
    let mut done = 0;
    for (range, replacement) in edits {
        if source.get(range.clone()).is_none() {
            return Err(EditError::Outside { range });
        }
        // Both ends are character borders now, so the piece between two edits exists.
        let Some(kept) = source.get(done..range.start) else {
            return Err(EditError::Overlap { at: range.start });
        };
        text.push_str(kept);
        text.push_str(&replacement);
        done = range.end;
    }
    text.push_str(&source[done..]);
    Ok(text)
}

/// The edits that add `key: value` as the last field of a section, laid out like its other
/// fields. `value` is RON already; texts go through [`super::text_literal`] first.
///
/// Several fields for one section need one round of edits each: the place of the second depends
/// on the first.
///
/// # Errors
/// [`EditError::NotASection`] and [`EditError::InvalidKey`].
pub fn added_field(
    document: &Document,
    section: &Node,
    key: &str,
    value: &str,
) -> Result<Vec<Edit>, EditError> {
    let fields = section.fields().ok_or(EditError::NotASection)?;
    if !is_key(key) {
        return Err(EditError::InvalidKey {
            key: key.to_owned(),
        });
    }
    // The closing bracket is one byte.
    let close = section.span.end - 1;
    let Some(last) = fields.last() else {
        return Ok(vec![(close..close, format!("{key}: {value}"))]);
    };
    let source = document.source();
    let tail = Tail::of(source, last.value.span.end, close);
    let mut edits = Vec::new();
    if !tail.has_comma {
        edits.push((tail.value_end..tail.value_end, ",".to_owned()));
    }
    let start = last.key.span.start;
    let line = source[..start].rfind('\n').map_or(0, |at| at + 1);
    let before = &source[line..start];
    let on_own_line = before.trim().is_empty() && line > 0;
    let (lead, comma) = if on_own_line || tail.ends_in_line_comment {
        let indent = &before[..before.len() - before.trim_start().len()];
        (format!("\n{indent}"), ",")
    } else {
        (" ".to_owned(), if tail.has_comma { "," } else { "" })
    };
    edits.push((tail.end..tail.end, format!("{lead}{key}: {value}{comma}")));
    Ok(edits)
}

/// What stands between the last value of a section and its closing bracket.
struct Tail {
    /// Behind the value and the brackets of `Some(value)` around it.
    value_end: usize,
    has_comma: bool,
    ends_in_line_comment: bool,
    /// Behind the comma and the comments on its line: a new field goes here.
    end: usize,
}

impl Tail {
    fn of(source: &str, value_end: usize, close: usize) -> Self {
        let between = &source[value_end..close];
        let mut tail = Self {
            value_end,
            has_comma: false,
            ends_in_line_comment: false,
            end: value_end,
        };
        for token in Lexer::new(between) {
            let range = value_end + token.range.start..value_end + token.range.end;
            let same_line = !source[tail.end..range.start].contains('\n');
            match token.kind {
                TokenKind::Comma => {
                    tail.has_comma = true;
                    tail.ends_in_line_comment = false;
                    tail.end = range.end;
                }
                TokenKind::Comment { .. } if same_line => {
                    tail.ends_in_line_comment = source[range.clone()].starts_with("//");
                    tail.end = range.end;
                }
                // What came before stood inside the brackets of `Some(value)`.
                TokenKind::Close(_) => {
                    let end = range.end;
                    tail = Self {
                        value_end: end,
                        has_comma: false,
                        ends_in_line_comment: false,
                        end,
                    };
                }
                _ => {}
            }
        }
        tail
    }
}
