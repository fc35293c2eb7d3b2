//! A fresh file from a plain tree: sections, aligned comments, one field a line.

use super::edit::EditError;
use super::literal::{is_key, text_literal};

/// Columns up to which a list stays on one line.
const LINE_WIDTH: usize = 100;

/// Behind longer fields a comment moves to the line above.
const COMMENT_COLUMN: usize = 60;

const INDENT: &str = "    ";

/// A line or more of a section.
#[derive(Debug, Clone, PartialEq)]
pub enum Entry {
    /// A comment on lines of its own; line ends in it begin new comment lines.
    Comment(String),
    /// An empty line.
    Blank,
    /// A field.
    Field {
        /// The key.
        key: String,
        /// The value.
        value: Value,
        /// A comment beside the field; empty for none.
        comment: String,
    },
}

impl Entry {
    /// A field without comment.
    #[must_use]
    pub fn field(key: impl Into<String>, value: Value) -> Self {
        Self::Field {
            key: key.into(),
            value,
            comment: String::new(),
        }
    }

    /// A field with a comment beside it.
    #[must_use]
    pub fn commented(key: impl Into<String>, value: Value, comment: impl Into<String>) -> Self {
        Self::Field {
            key: key.into(),
            value,
            comment: comment.into(),
        }
    }
}

/// A value to write.
#[derive(Debug, Clone, PartialEq)]
pub enum Value {
    /// A text in quotes.
    Text(String),
    /// A bare whole number.
    Integer(i64),
    /// `true` or `false`.
    Bool(bool),
    /// A section over several lines.
    Section(Vec<Entry>),
    /// A section on one line: `(kind: "wheel step", at: "3 s")`.
    Inline(Vec<(String, Self)>),
    /// A group without keys on one line: `("0 s", "900 rpm")`.
    Tuple(Vec<Self>),
    /// A list: on one line if it fits, else one element a line.
    List(Vec<Self>),
}

impl Value {
    /// A text in quotes.
    #[must_use]
    pub fn text(text: impl Into<String>) -> Self {
        Self::Text(text.into())
    }
}

/// Writes a whole file: the root section in brackets, with a line end at its end.
///
/// # Errors
/// [`EditError::InvalidKey`] for a key that RON would not read back.
pub fn emit(root: &[Entry]) -> Result<String, EditError> {
    let mut out = String::new();
    let mut comments = root;
    // Comments at the very top stand above the bracket, as the head of the file.
    while let [head @ (Entry::Comment(_) | Entry::Blank), rest @ ..] = comments {
        push_loose(&mut out, "", head);
        comments = rest;
    }
    out.push_str(&section(comments, "")?);
    out.push('\n');
    Ok(out)
}

/// A section over several lines; the closing bracket stands at `indent`.
fn section(entries: &[Entry], indent: &str) -> Result<String, EditError> {
    if entries.is_empty() {
        return Ok("()".to_owned());
    }
    let inner = format!("{indent}{INDENT}");
    let mut lines = Vec::new();
    for entry in entries {
        lines.push(match entry {
            Entry::Comment(_) | Entry::Blank => Line::Loose(entry),
            Entry::Field {
                key,
                value,
                comment,
            } => {
                check(key)?;
                let text = format!("{inner}{key}: {},", spelled(value, &inner)?);
                Line::Field { text, comment }
            }
        });
    }
    let mut out = String::from("(\n");
    for (index, line) in lines.iter().enumerate() {
        match line {
            Line::Loose(entry) => push_loose(&mut out, &inner, entry),
            Line::Field { text, comment: "" } => push_line(&mut out, text),
            Line::Field { text, comment } if line.takes_comment_beside() => {
                let width = comment_column(&lines, index);
                let pad = " ".repeat(width.saturating_sub(text.chars().count()));
                push_line(&mut out, &format!("{text}{pad} // {}", one_line(comment)));
            }
            Line::Field { text, comment } => {
                push_comment(&mut out, &inner, comment);
                push_line(&mut out, text);
            }
        }
    }
    out.push_str(indent);
    out.push(')');
    Ok(out)
}

/// A line of a section, ready but for its comment.
enum Line<'a> {
    Loose(&'a Entry),
    Field { text: String, comment: &'a str },
}

impl Line<'_> {
    /// Whether this is a short field with a comment, which then stands beside it.
    fn takes_comment_beside(&self) -> bool {
        match self {
            Line::Field { text, comment } => {
                !comment.is_empty()
                    && !text.contains('\n')
                    && text.chars().count() <= COMMENT_COLUMN
            }
            Line::Loose(_) => false,
        }
    }

    fn width(&self) -> usize {
        match self {
            Line::Field { text, .. } => text.chars().count(),
            Line::Loose(_) => 0,
        }
    }
}

/// The column at which the comments around line `index` are aligned: one block of neighbouring
/// fields with comments beside them.
fn comment_column(lines: &[Line<'_>], index: usize) -> usize {
    let beside = |line: &&Line<'_>| line.takes_comment_beside();
    let above = lines[..index].iter().rev().take_while(beside);
    let below = lines[index..].iter().take_while(beside);
    above.chain(below).map(Line::width).max().unwrap_or(0)
}

/// A value as RON; `indent` is that of the line it begins on.
fn spelled(value: &Value, indent: &str) -> Result<String, EditError> {
    Ok(match value {
        Value::Text(text) => text_literal(text),
        Value::Integer(number) => number.to_string(),
        Value::Bool(value) => value.to_string(),
        Value::Section(entries) => section(entries, indent)?,
        Value::Inline(fields) => {
            let field = |(key, value): &(String, Value)| {
                check(key)?;
                Ok(format!("{key}: {}", spelled(value, indent)?))
            };
            format!(
                "({})",
                fields
                    .iter()
                    .map(field)
                    .collect::<Result<Vec<_>, _>>()?
                    .join(", ")
            )
        }
        Value::Tuple(values) => {
            // A group of one would read as the value itself without its comma.
            let comma = if values.len() == 1 { "," } else { "" };
            format!("({}{comma})", spelled_all(values, indent)?.join(", "))
        }
        Value::List(values) => list(values, indent)?,
    })
}

fn spelled_all(values: &[Value], indent: &str) -> Result<Vec<String>, EditError> {
    values.iter().map(|value| spelled(value, indent)).collect()
}

fn list(values: &[Value], indent: &str) -> Result<String, EditError> {
    let inner = format!("{indent}{INDENT}");
    let line = format!("[{}]", spelled_all(values, indent)?.join(", "));
    if !line.contains('\n') && indent.len() + line.chars().count() <= LINE_WIDTH {
        return Ok(line);
    }
    let mut out = String::from("[\n");
    for value in spelled_all(values, &inner)? {
        push_line(&mut out, &format!("{inner}{value},"));
    }
    out.push_str(indent);
    out.push(']');
    Ok(out)
}

fn check(key: &str) -> Result<(), EditError> {
    if is_key(key) {
        Ok(())
    } else {
        Err(EditError::InvalidKey {
            key: key.to_owned(),
        })
    }
}

fn push_loose(out: &mut String, indent: &str, entry: &Entry) {
    match entry {
        Entry::Comment(text) => push_comment(out, indent, text),
        Entry::Blank => out.push('\n'),
        Entry::Field { .. } => {}
    }
}

fn push_comment(out: &mut String, indent: &str, text: &str) {
    for line in text.lines() {
        push_line(out, format!("{indent}// {}", one_line(line)).trim_end());
    }
}

fn push_line(out: &mut String, line: &str) {
    out.push_str(line);
    out.push('\n');
}

/// A comment must not run over its line.
fn one_line(text: &str) -> String {
    text.split(char::is_control)
        .map(str::trim)
        .filter(|part| !part.is_empty())
        .collect::<Vec<_>>()
        .join(" ")
}
