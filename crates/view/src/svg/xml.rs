//! Writing XML: escaped, indented, one element a line, so that a golden file reads well.

use std::fmt::{self, Display, Write as _};

/// A length or coordinate, rounded to hundredths, which no eye can tell and which keeps files the
/// same on every machine.
#[derive(Debug, Clone, Copy)]
pub(super) struct Px(pub(super) f64);

impl Display for Px {
    fn fmt(&self, formatter: &mut fmt::Formatter<'_>) -> fmt::Result {
        let hundredths = (self.0 * 100.0).round();
        // Adding zero turns a negative zero into a plain one.
        write!(formatter, "{}", hundredths / 100.0 + 0.0)
    }
}

/// Text in which markup is only text, also between double quotes. Characters that XML 1.0 forbids become U+FFFD.
pub(super) fn escaped(text: &str) -> String {
    let mut safe = String::with_capacity(text.len());
    for character in text.chars() {
        match character {
            '&' => safe.push_str("&amp;"),
            '<' => safe.push_str("&lt;"),
            '>' => safe.push_str("&gt;"),
            '"' => safe.push_str("&quot;"),
            '\t' | '\n' | '\r' => safe.push(' '),
            '\0'..='\u{1f}' | '\u{fffe}' | '\u{ffff}' => safe.push('\u{fffd}'),
            other => safe.push(other),
        }
    }
    safe
}

/// An XML document in the making.
#[derive(Debug, Default)]
pub(super) struct Xml {
    text: String,
    open: Vec<&'static str>,
}

/// An attribute: name and value.
pub(super) type Attribute<'a> = (&'a str, &'a dyn Display);

impl Xml {
    /// Opens an element that [`Self::close`] will close.
    pub(super) fn open(&mut self, name: &'static str, attributes: &[Attribute<'_>]) {
        self.start(name, attributes);
        self.text.push_str(">\n");
        self.open.push(name);
    }

    /// Closes the element opened last.
    pub(super) fn close(&mut self) {
        if let Some(name) = self.open.pop() {
            self.indent();
            self.put(format_args!("</{name}>\n"));
        }
    }

    /// An element without content.
    pub(super) fn empty(&mut self, name: &'static str, attributes: &[Attribute<'_>]) {
        self.start(name, attributes);
        self.text.push_str("/>\n");
    }

    /// An element with text.
    pub(super) fn text(&mut self, name: &'static str, attributes: &[Attribute<'_>], text: &str) {
        self.start(name, attributes);
        self.put(format_args!(">{}</{name}>\n", escaped(text)));
    }

    /// An element with text, and a second text in a `tspan` of its own.
    pub(super) fn text_in_two(
        &mut self,
        name: &'static str,
        attributes: &[Attribute<'_>],
        text: &str,
        (span_attributes, span): (&[Attribute<'_>], &str),
    ) {
        self.start(name, attributes);
        // In one line: white space between the two would be drawn.
        self.put(format_args!(">{}<tspan", escaped(text)));
        self.put_attributes(span_attributes);
        self.put(format_args!(">{}</tspan></{name}>\n", escaped(span)));
    }

    /// The document.
    pub(super) fn finish(mut self) -> String {
        while !self.open.is_empty() {
            self.close();
        }
        self.text
    }

    fn start(&mut self, name: &str, attributes: &[Attribute<'_>]) {
        self.indent();
        self.put(format_args!("<{name}"));
        self.put_attributes(attributes);
    }

    fn put_attributes(&mut self, attributes: &[Attribute<'_>]) {
        for (key, value) in attributes {
            let value = escaped(&value.to_string());
            self.put(format_args!(" {key}=\"{value}\""));
        }
    }

    fn indent(&mut self) {
        for _ in &self.open {
            self.text.push(' ');
        }
    }

    fn put(&mut self, arguments: fmt::Arguments<'_>) {
        // Writing into a string cannot fail.
        let _ = self.text.write_fmt(arguments);
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn coordinates_have_two_places_at_most() {
        for (value, text) in [
            (1.0, "1"),
            (-0.001, "0"),
            (12.345_678, "12.35"),
            (-3.1, "-3.1"),
            (1e4 / 3.0, "3333.33"),
        ] {
            assert_eq!(Px(value).to_string(), text, "{value}");
        }
    }

    #[test]
    fn markup_in_text_stays_text() {
        let nasty = "a < b && \"c\" > 'd' \u{1} \u{0}\n</text><script>";
        let mut xml = Xml::default();
        xml.open("g", &[("label", &nasty)]);
        xml.text("text", &[], nasty);
        let document = xml.finish();
        let read = roxmltree::Document::parse(&document).unwrap();
        let expected = "a < b && \"c\" > 'd' \u{fffd} \u{fffd} </text><script>";
        let group = read.root_element();
        assert_eq!(group.attribute("label"), Some(expected), "attribute");
        let text = group.first_element_child().unwrap();
        assert_eq!(text.text(), Some(expected), "content");
    }
}
