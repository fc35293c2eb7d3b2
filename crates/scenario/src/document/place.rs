//! Places in a text, as people count them.

use std::fmt;

/// A place in a text.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub struct Place {
    /// Line, from 1.
    pub line: usize,
    /// Column in characters, from 1.
    pub column: usize,
}

impl fmt::Display for Place {
    fn fmt(&self, formatter: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(formatter, "{}:{}", self.line, self.column)
    }
}

/// Where the lines of a text begin, so that many places cost little.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(crate) struct Lines {
    starts: Vec<usize>,
}

impl Lines {
    pub(crate) fn of(text: &str) -> Self {
        let after_breaks = text.bytes().enumerate().filter(|(_, byte)| *byte == b'\n');
        let starts = std::iter::once(0)
            .chain(after_breaks.map(|(at, _)| at + 1))
            .collect();
        Self { starts }
    }

    /// The place of a byte of `text`; beyond its end, the place right behind it.
    pub(crate) fn place(&self, text: &str, offset: usize) -> Place {
        let line = self.starts.partition_point(|start| *start <= offset);
        let start = self
            .starts
            .get(line.saturating_sub(1))
            .copied()
            .unwrap_or(0);
        let rest = text.get(start..).unwrap_or("");
        // Counted, not sliced: an offset inside a character must not panic.
        let before = rest
            .char_indices()
            .take_while(|(at, _)| start + at < offset)
            .count();
        Place {
            line,
            column: before + 1,
        }
    }

    /// The byte at a place; a place beyond a line gives the end of the text.
    pub(crate) fn offset(&self, text: &str, place: Place) -> usize {
        let Some(start) = self.starts.get(place.line.saturating_sub(1)) else {
            return text.len();
        };
        let rest = text.get(*start..).unwrap_or("");
        rest.char_indices()
            .nth(place.column.saturating_sub(1))
            .map_or(text.len(), |(at, _)| start + at)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn lines_and_columns_count_characters() {
        let text = "a\nµm: é\n\nend";
        let lines = Lines::of(text);
        for (needle, line, column) in [
            ("a", 1, 1),
            ("µ", 2, 1),
            (":", 2, 3),
            ("é", 2, 5),
            ("end", 4, 1),
        ] {
            let offset = text.find(needle).expect("it is there");
            let place = Place { line, column };
            assert_eq!(lines.place(text, offset), place, "place of {needle}");
            assert_eq!(lines.offset(text, place), offset, "offset of {needle}");
        }
        assert_eq!(
            lines.place(text, text.len()),
            Place { line: 4, column: 4 },
            "the very end"
        );
        assert_eq!(
            lines.place(text, 99),
            Place { line: 4, column: 4 },
            "beyond the end"
        );
        assert_eq!(
            lines.place(text, 3),
            Place { line: 2, column: 2 },
            "inside a character"
        );
        assert_eq!(
            lines.offset(text, Place { line: 9, column: 1 }),
            text.len(),
            "no such line"
        );
    }
}
