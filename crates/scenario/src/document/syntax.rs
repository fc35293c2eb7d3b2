//! Syntax errors in our own words: what was expected, and what most likely happened.

use ron::error::{Error, SpannedError};

use super::brackets::{Balance, balance, runaway_text};
use super::place::{Lines, Place};

/// What is wrong with a text that `ron` refused.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(super) enum Fault {
    /// The text ends inside something that begins at the offset.
    Truncated {
        open: usize,
        what: String,
        suspect: Option<usize>,
    },
    /// Deeper than `ron` was allowed to go.
    TooDeep { at: usize },
    /// Anything else.
    Syntax { at: usize, message: String },
}

/// Finds the most helpful words for an error of `ron`.
pub(super) fn fault(source: &str, lines: &Lines, error: &SpannedError) -> Fault {
    let end = Place {
        line: error.span.end.line,
        column: error.span.end.col,
    };
    let at = lines.offset(source, end);
    if error.code == Error::ExceededRecursionLimit {
        return Fault::TooDeep { at };
    }
    let at_end = source[at..].trim().is_empty()
        || matches!(
            error.code,
            Error::Eof | Error::ExpectedStringEnd | Error::UnclosedBlockComment
        );
    match balance(source) {
        Balance::Unclosed {
            open,
            what,
            suspect,
        } if at_end => {
            return Fault::Truncated {
                open,
                what,
                suspect,
            };
        }
        Balance::Crossed { open, close } if at >= close => {
            let line = lines.place(source, open).line;
            let (opening, closing) = (&source[open..=open], &source[close..=close]);
            let message = format!("`{opening}` of line {line} is closed by `{closing}`");
            return Fault::Syntax { at: close, message };
        }
        _ => {}
    }
    if let Some(start) = runaway_text(source, at) {
        let message = "the text that begins here runs over the end of its line; its closing quote \
                       seems to be missing";
        return Fault::Syntax {
            at: start,
            message: message.to_owned(),
        };
    }
    Fault::Syntax {
        at,
        message: words(source, at, &error.code),
    }
}

/// What `ron` expected, in our words.
fn words(source: &str, at: usize, code: &Error) -> String {
    let fixed = match code {
        Error::ExpectedComma if is_bare_quantity(source, at) => {
            "a quantity stands in double quotes, such as \"3.7 mm\""
        }
        Error::ExpectedComma if is_behind_key(source, at) => {
            "a colon is expected after the name of the field"
        }
        Error::ExpectedComma => "a comma is missing before this",
        Error::ExpectedMapColon => "a colon is expected after the name of the field",
        Error::ExpectedIdentifier => "the name of a field is expected",
        Error::ExpectedStructLikeEnd | Error::ExpectedOptionEnd => "`,` or `)` is expected",
        Error::ExpectedArrayEnd => "`,` or `]` is expected",
        Error::ExpectedMapEnd => "`,` or `}` is expected",
        Error::ExpectedStructLike => "`(` is expected",
        Error::ExpectedString => "a text in double quotes is expected",
        Error::ExpectedStringEnd => "a text has no closing quote",
        Error::UnclosedBlockComment => "a comment `/*` is not closed",
        Error::TrailingCharacters => "something follows after the closing bracket of the file",
        Error::InvalidEscape(_) => {
            "a backslash in a text begins an escape such as \\n; write \\\\ for a backslash, or r\"...\""
        }
        Error::UnexpectedChar('“' | '”' | '„' | '‘' | '’') => {
            "use straight double quotes"
        }
        Error::UnexpectedChar(letter) => {
            return format!("{letter:?} cannot stand here; texts stand in double quotes");
        }
        Error::SuggestRawIdentifier(name) => {
            return format!("{name:?} cannot be a name; names have letters, digits and _");
        }
        Error::Eof => "the file ends too early",
        other => return lower_first(&other.to_string()),
    };
    fixed.to_owned()
}

/// A number just before and a unit just behind `at`, on one line: the quotes were forgotten.
fn is_bare_quantity(source: &str, at: usize) -> bool {
    let before = source[..at].trim_end_matches([' ', '\t']);
    let number = before.ends_with(|letter: char| letter.is_ascii_digit() || letter == '.');
    number
        && source[at..].starts_with(|letter: char| letter.is_alphabetic() || "%°".contains(letter))
}

/// A lone word between a bracket or a comma and `at`: a key without its colon.
fn is_behind_key(source: &str, at: usize) -> bool {
    let is_part = |letter: char| letter.is_alphanumeric() || letter == '_';
    let before = source[..at].trim_end();
    let rest = before.trim_end_matches(is_part);
    let is_word = before[rest.len()..].starts_with(|letter: char| !letter.is_ascii_digit());
    is_word && rest.trim_end().ends_with(['(', ','])
}

fn lower_first(text: &str) -> String {
    let mut letters = text.chars();
    letters.next().map_or_else(String::new, |first| {
        first.to_lowercase().chain(letters).collect()
    })
}
