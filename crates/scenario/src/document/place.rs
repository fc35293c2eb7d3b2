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

/// Bytes between two counts of characters: what one place costs, even in a file of one huge line.
const BLOCK: usize = 1024;

/// Where the lines of a text begin, so that many places cost little.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(crate) struct Lines {
    starts: Vec<usize>,
    /// Characters that begin before each block.
    counts: Vec<usize>,
}

impl Lines {
    pub(crate) fn of(text: &str) -> Self {
        let after_breaks = text.bytes().enumerate().filter(|(_, byte)| *byte == b'\n');
        let starts = std::iter::once(0)
            .chain(after_breaks.map(|(at, _)| at + 1))
            .collect();
        let mut counts = vec![0];
        let mut total = 0;
        for block in text.as_bytes().chunks(BLOCK) {
            total += beginnings(block);
            counts.push(total);
        }
        Self { starts, counts }
    }

    /// The place of a byte of `text`; beyond its end, the place right behind it.
    pub(crate) fn place(&self, text: &str, offset: usize) -> Place {
        let line = self.starts.partition_point(|start| *start <= offset);
        let start = self
            .starts
            .get(line.saturating_sub(1))
            .copied()
            .unwrap_or(0);
        let column = self.characters(text, offset) - self.characters(text, start) + 1;
        Place { line, column }
    }

    /// Number of characters that begin before `offset`.
    fn characters(&self, text: &str, offset: usize) -> usize {
        let offset = offset.min(text.len());
        let block = offset / BLOCK;
        let counted = self.counts.get(block).copied().unwrap_or(0);
        counted + beginnings(&text.as_bytes()[block * BLOCK..offset])
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

/// Bytes that begin a character: in UTF-8 all but those whose two highest bits are 1 and 0.
fn beginnings(bytes: &[u8]) -> usize {
    bytes.iter().filter(|byte| **byte & 0xc0 != 0x80).count()
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

    #[test]
    fn long_lines_count_right_across_blocks() {
        let text = format!("x\n{}", "aµ€".repeat(2000));
        let lines = Lines::of(&text);
        for (column, (at, _)) in text[2..].char_indices().enumerate() {
            let place = Place {
                line: 2,
                column: column + 1,
            };
            assert_eq!(lines.place(&text, at + 2), place, "byte {at}");
        }
        assert_eq!(
            lines.place(&text, text.len()),
            Place {
                line: 2,
                column: 6001
            },
            "the end"
        );
    }
}
