//! From RON text to the tree, by way of the `ron` crate.
//!
//! One pass over the whole text finds syntax errors, with the places `ron` gives. The tree is then
//! read level by level: of each section `ron` hands out its keys and the *unread* text of its
//! values, both as slices of the source, so the place of everything is its address in the source.

use std::fmt;
use std::ops::Range;

use ron::Options;
use ron::de::Deserializer;
use ron::error::SpannedError;
use ron::value::RawValue;
use serde::de::{Deserialize, Deserializer as _, IgnoredAny, MapAccess, SeqAccess, Visitor};

use super::node::{Field, Key, Kind, Node};

/// Levels of nesting. A circuit needs five; each level costs one more pass over what is in it.
pub(super) const MAX_DEPTH: usize = 24;

/// Values in one file. A circuit has a few hundred.
pub(super) const MAX_NODES: usize = 100_000;

/// Why there is no tree.
#[derive(Debug)]
pub(super) enum NoTree {
    /// `ron` refused the text.
    Syntax(Box<SpannedError>),
    /// More than [`MAX_NODES`] values.
    TooMany,
}

impl From<SpannedError> for NoTree {
    fn from(error: SpannedError) -> Self {
        Self::Syntax(Box::new(error))
    }
}

/// Reads a whole text.
pub(super) fn read_tree(source: &str) -> Result<Node, NoTree> {
    let _: IgnoredAny = options().from_str(source)?;
    Reader { source, nodes: 0 }.node(source)
}

/// `ron` counts up to three steps of recursion for each level of nesting.
fn options() -> Options {
    Options::default().with_recursion_limit(3 * (MAX_DEPTH + 1))
}

struct Reader<'a> {
    source: &'a str,
    nodes: usize,
}

impl<'a> Reader<'a> {
    /// Reads the one value in `slice`, which may have blanks and comments around it.
    fn node(&mut self, slice: &'a str) -> Result<Node, NoTree> {
        let mut deserializer = Deserializer::from_str_with_options(slice, &options())?;
        let body = deserializer.remainder();
        // A map may have any value as its key: it is told by its bracket and left unread.
        let shallow = if body.starts_with('{') {
            IgnoredAny::deserialize(&mut deserializer).map(|_| Shallow::Other("a map"))
        } else {
            deserializer.deserialize_any(ShallowVisitor)
        };
        let shallow = shallow.map_err(|error| deserializer.span_error(error))?;
        let length = body.len() - deserializer.remainder().len();
        let written = &body[..length];
        self.count(&shallow)?;
        self.finish(shallow, written)
    }

    fn count(&mut self, shallow: &Shallow<'_>) -> Result<(), NoTree> {
        self.nodes += match shallow {
            Shallow::Fields(fields) => fields.len(),
            Shallow::Elements(elements) => elements.len(),
            _ => 0,
        };
        if self.nodes > MAX_NODES {
            Err(NoTree::TooMany)
        } else {
            Ok(())
        }
    }

    /// Turns one level into a node, reading the levels below it.
    fn finish(&mut self, shallow: Shallow<'a>, written: &'a str) -> Result<Node, NoTree> {
        let mut span = self.span(written);
        let mut name = leading_word(written).map(str::to_owned);
        let kind = match shallow {
            // `Some(value)` is read as the value.
            Shallow::Inner(inner) => return self.node(inner),
            Shallow::Fields(fields) => Kind::Struct(self.fields(fields)?),
            Shallow::Elements(elements) if written.starts_with('[') => {
                Kind::List(self.elements(elements)?)
            }
            Shallow::Elements(elements) if elements.is_empty() => Kind::Struct(Vec::new()),
            Shallow::Elements(elements) => Kind::Tuple(self.elements(elements)?),
            Shallow::Text(text) => Kind::Text(text),
            Shallow::Number(value) => {
                // `ron` may have rounded to fewer bits than the text holds.
                let plain = written.replace('_', "");
                Kind::Number(plain.parse().unwrap_or(value))
            }
            Shallow::Bool(value) => Kind::Bool(value),
            Shallow::Unit => match name.take() {
                Some(word) => {
                    // Behind a bare word `ron` also takes blanks and comments.
                    span.end = span.start + word.len();
                    Kind::Word(word)
                }
                None if written.starts_with('(') => Kind::Struct(Vec::new()),
                None => Kind::Other("a range"),
            },
            Shallow::Other(words) => Kind::Other(words),
        };
        let has_name = matches!(kind, Kind::Struct(_) | Kind::Tuple(_));
        Ok(Node {
            span,
            name: name.filter(|_| has_name),
            kind,
        })
    }

    fn fields(&mut self, fields: Vec<(&'a str, &'a str)>) -> Result<Vec<Field>, NoTree> {
        let field = |(key, value): (&'a str, &'a str)| {
            let key = Key {
                text: key.to_owned(),
                span: self.span(key),
            };
            Ok(Field {
                key,
                value: self.node(value)?,
            })
        };
        fields.into_iter().map(field).collect()
    }

    fn elements(&mut self, elements: Vec<&'a str>) -> Result<Vec<Node>, NoTree> {
        elements
            .into_iter()
            .map(|element| self.node(element))
            .collect()
    }

    /// The bytes of the source that `slice` covers.
    fn span(&self, slice: &str) -> Range<usize> {
        let start = slice
            .as_ptr()
            .addr()
            .checked_sub(self.source.as_ptr().addr());
        let start = start.expect("ron hands out slices of the text it was given");
        let end = start + slice.len();
        assert!(
            end <= self.source.len(),
            "ron hands out slices of the text it was given"
        );
        start..end
    }
}

/// The word at the start, such as the name of a section.
fn leading_word(text: &str) -> Option<&str> {
    let raw = text
        .strip_prefix("r#")
        .filter(|rest| !rest.starts_with(['"', '#']));
    let body = raw.unwrap_or(text);
    let is_part = |letter: char| letter.is_alphanumeric() || letter == '_';
    let is_raw_part = |letter: char| is_part(letter) || (raw.is_some() && ".+-".contains(letter));
    if !body.starts_with(|letter: char| letter.is_alphabetic() || letter == '_') {
        return None;
    }
    let length = body
        .find(|letter| !is_raw_part(letter))
        .unwrap_or(body.len());
    Some(&text[..text.len() - body.len() + length])
}

/// One level of a value; what is below is still text.
enum Shallow<'a> {
    Fields(Vec<(&'a str, &'a str)>),
    Elements(Vec<&'a str>),
    Inner(&'a str),
    Text(String),
    Number(f64),
    Bool(bool),
    Unit,
    Other(&'static str),
}

struct ShallowVisitor;

impl<'de> Visitor<'de> for ShallowVisitor {
    type Value = Shallow<'de>;

    fn expecting(&self, formatter: &mut fmt::Formatter<'_>) -> fmt::Result {
        formatter.write_str("a value of a circuit file")
    }

    fn visit_map<A: MapAccess<'de>>(self, mut map: A) -> Result<Self::Value, A::Error> {
        let mut fields = Vec::new();
        while let Some(Identifier(key)) = map.next_key()? {
            let Some(key) = key else {
                // Only a range names its ends without writing them.
                while map.next_value::<IgnoredAny>().is_ok()
                    && map.next_key::<IgnoredAny>()?.is_some()
                {}
                return Ok(Shallow::Other("a range"));
            };
            let value: &RawValue = map.next_value()?;
            fields.push((key, value.get_ron()));
        }
        Ok(Shallow::Fields(fields))
    }

    fn visit_seq<A: SeqAccess<'de>>(self, mut sequence: A) -> Result<Self::Value, A::Error> {
        let mut elements = Vec::new();
        while let Some(element) = sequence.next_element::<&RawValue>()? {
            elements.push(element.get_ron());
        }
        Ok(Shallow::Elements(elements))
    }

    fn visit_some<D: serde::Deserializer<'de>>(self, inner: D) -> Result<Self::Value, D::Error> {
        let inner = <&RawValue>::deserialize(inner)?;
        Ok(Shallow::Inner(inner.get_ron()))
    }

    fn visit_none<E>(self) -> Result<Self::Value, E> {
        Ok(Shallow::Unit)
    }

    fn visit_unit<E>(self) -> Result<Self::Value, E> {
        Ok(Shallow::Unit)
    }

    fn visit_str<E>(self, text: &str) -> Result<Self::Value, E> {
        Ok(Shallow::Text(text.to_owned()))
    }

    fn visit_bool<E>(self, value: bool) -> Result<Self::Value, E> {
        Ok(Shallow::Bool(value))
    }

    fn visit_f64<E>(self, value: f64) -> Result<Self::Value, E> {
        Ok(Shallow::Number(value))
    }

    // Whole numbers beyond 2^53 are no counts of ours; the text is parsed again anyway.
    fn visit_i64<E>(self, value: i64) -> Result<Self::Value, E> {
        Ok(Shallow::Number(value as f64))
    }

    fn visit_u64<E>(self, value: u64) -> Result<Self::Value, E> {
        Ok(Shallow::Number(value as f64))
    }

    fn visit_char<E>(self, _: char) -> Result<Self::Value, E> {
        Ok(Shallow::Other("a single character"))
    }

    fn visit_bytes<E>(self, _: &[u8]) -> Result<Self::Value, E> {
        Ok(Shallow::Other("a text of bytes"))
    }
}

/// A key as a slice of the source; `None` for the made-up keys of a range.
struct Identifier<'a>(Option<&'a str>);

impl<'de> Deserialize<'de> for Identifier<'de> {
    fn deserialize<D: serde::Deserializer<'de>>(deserializer: D) -> Result<Self, D::Error> {
        deserializer.deserialize_identifier(IdentifierVisitor)
    }
}

struct IdentifierVisitor;

impl<'de> Visitor<'de> for IdentifierVisitor {
    type Value = Identifier<'de>;

    fn expecting(&self, formatter: &mut fmt::Formatter<'_>) -> fmt::Result {
        formatter.write_str("the name of a field")
    }

    fn visit_borrowed_str<E>(self, key: &'de str) -> Result<Self::Value, E> {
        Ok(Identifier(Some(key)))
    }

    fn visit_str<E>(self, _: &str) -> Result<Self::Value, E> {
        Ok(Identifier(None))
    }
}
