//! The tree of a document: values with the bytes they stand in.

use std::ops::Range;

/// A value of the file.
#[derive(Debug, Clone, PartialEq)]
pub struct Node {
    /// The bytes of the value in the source, quotes and brackets included.
    pub span: Range<usize>,
    /// A name before the bracket of a section, as in `Valve(...)`. It has no meaning for us.
    pub name: Option<String>,
    /// What the value is.
    pub kind: Kind,
}

/// What a value is.
#[derive(Debug, Clone, PartialEq)]
pub enum Kind {
    /// A section `( key: value, ... )`, in the order of the file; `()` is an empty one.
    Struct(Vec<Field>),
    /// A list `[ ... ]`.
    List(Vec<Node>),
    /// A group without keys `( value, ... )`.
    Tuple(Vec<Node>),
    /// A text, escapes resolved.
    Text(String),
    /// A bare number.
    Number(f64),
    /// `true` or `false`.
    Bool(bool),
    /// A bare word such as `none`.
    Word(String),
    /// Something circuit files do not use, in words: `a map`, `a range`, ...
    Other(&'static str),
}

/// A key with its value.
#[derive(Debug, Clone, PartialEq)]
pub struct Field {
    /// The key.
    pub key: Key,
    /// The value.
    pub value: Node,
}

/// A key and the bytes it stands in.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Key {
    /// The key as written.
    pub text: String,
    /// Its bytes in the source.
    pub span: Range<usize>,
}

impl Node {
    /// The fields of a section; `None` for anything else.
    #[must_use]
    pub fn fields(&self) -> Option<&[Field]> {
        match &self.kind {
            Kind::Struct(fields) => Some(fields),
            _ => None,
        }
    }

    /// The value of a key of a section. Of a doubled key, the first.
    #[must_use]
    pub fn get(&self, key: &str) -> Option<&Self> {
        self.fields()?
            .iter()
            .find(|field| field.key.text == key)
            .map(|field| &field.value)
    }

    /// The elements of a list or of a group without keys.
    #[must_use]
    pub fn elements(&self) -> Option<&[Self]> {
        match &self.kind {
            Kind::List(elements) | Kind::Tuple(elements) => Some(elements),
            _ => None,
        }
    }

    /// The content of a text.
    #[must_use]
    pub fn text(&self) -> Option<&str> {
        match &self.kind {
            Kind::Text(text) => Some(text),
            _ => None,
        }
    }

    /// What the value is, in words with article: `a text`, `a section`, ...
    #[must_use]
    pub fn describe(&self) -> &'static str {
        match &self.kind {
            Kind::Struct(_) => "a section",
            Kind::List(_) => "a list",
            Kind::Tuple(_) => "a group without keys",
            Kind::Text(_) => "a text",
            Kind::Number(_) => "a number",
            Kind::Bool(_) => "a yes-or-no value",
            Kind::Word(_) => "a word without quotes",
            Kind::Other(words) => words,
        }
    }
}
