//! Tables for people: plain text, aligned by blanks alone.

use unicode_width::{UnicodeWidthChar, UnicodeWidthStr};

use crate::plot::MINUS;

/// Blanks between columns.
const GAP: usize = 2;

/// Blanks before text that had no room in its column.
const INDENT: usize = 4;

/// A column narrower than this is no pleasure to read: its text goes below the row.
const LEAST_WRAPPED: usize = 24;

/// How a column stands.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
enum Kind {
    Left,
    Right,
    Wrapped,
}

/// A column of a table.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Column {
    head: String,
    kind: Kind,
}

impl Column {
    /// Words: aligned left, never broken.
    #[must_use]
    pub fn left(head: impl Into<String>) -> Self {
        Self {
            head: head.into(),
            kind: Kind::Left,
        }
    }

    /// Numbers: aligned right, with a real minus, never broken.
    #[must_use]
    pub fn right(head: impl Into<String>) -> Self {
        Self {
            head: head.into(),
            kind: Kind::Right,
        }
    }

    /// Sentences: aligned left and broken at blanks to the room that is left; without enough room,
    /// below their row.
    #[must_use]
    pub fn wrapped(head: impl Into<String>) -> Self {
        Self {
            head: head.into(),
            kind: Kind::Wrapped,
        }
    }
}

/// Rows of text under heads.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct TextTable {
    columns: Vec<Column>,
    rows: Vec<Vec<String>>,
}

impl TextTable {
    /// A table without rows.
    #[must_use]
    pub fn new(columns: Vec<Column>) -> Self {
        Self {
            columns,
            rows: Vec::new(),
        }
    }

    /// Adds a row. Cells beyond the last column are dropped, missing ones are empty. Line breaks
    /// and control characters count as blanks.
    pub fn push(&mut self, row: impl IntoIterator<Item = impl AsRef<str>>) {
        let cells = row.into_iter().zip(&self.columns);
        let mut cells: Vec<String> = cells
            .map(|(cell, column)| cleaned(cell.as_ref(), column.kind))
            .collect();
        cells.resize(self.columns.len(), String::new());
        self.rows.push(cells);
    }

    /// The table as text of at most `width` characters, each line ended. Columns that may not be
    /// broken keep their width even if that is too much. A column without any content is left out.
    ///
    /// # Examples
    /// ```
    /// use helmsplit_view::{Column, TextTable};
    ///
    /// let mut table = TextTable::new(vec![Column::left("port"), Column::right("flow")]);
    /// table.push(["priority", "15.2 L/min"]);
    /// table.push(["leakage", "-0.1 L/min"]);
    /// assert_eq!(
    ///     table.to_text(80),
    ///     "port            flow\npriority  15.2 L/min\nleakage   −0.1 L/min\n"
    /// );
    /// ```
    #[must_use]
    pub fn to_text(&self, width: usize) -> String {
        let plan = Plan::new(self, width);
        let mut text = String::new();
        let heads: Vec<String> = self
            .columns
            .iter()
            .map(|column| column.head.clone())
            .collect();
        if heads.iter().any(|head| !head.is_empty()) {
            plan.write(&mut text, &self.columns, &heads, true);
        }
        for row in &self.rows {
            plan.write(&mut text, &self.columns, row, false);
        }
        text
    }
}

/// Where a column goes.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
enum Place {
    /// In the row, so many characters wide.
    Beside(usize),
    /// Below the row.
    Below,
    /// Nowhere: it is empty.
    Nowhere,
}

/// How the columns share the width.
struct Plan {
    places: Vec<Place>,
    width: usize,
}

impl Plan {
    fn new(table: &TextTable, width: usize) -> Self {
        let natural: Vec<usize> = (0..table.columns.len())
            .map(|index| {
                let cells = table.rows.iter().map(|row| row[index].width());
                match cells.max().unwrap_or(0) {
                    0 => 0,
                    widest => widest.max(table.columns[index].head.width()),
                }
            })
            .collect();
        let is_wrapped = |index: usize| table.columns[index].kind == Kind::Wrapped;
        let fixed: usize = (0..natural.len())
            .filter(|&index| !is_wrapped(index) && natural[index] > 0)
            .map(|index| natural[index] + GAP)
            .sum();
        let mut wrapped: Vec<usize> = (0..natural.len())
            .filter(|&index| is_wrapped(index) && natural[index] > 0)
            .collect();
        // The narrowest take what they need and leave the rest to the others.
        wrapped.sort_by_key(|&index| natural[index]);
        let mut places: Vec<Place> = natural
            .iter()
            .map(|&natural| match natural {
                0 => Place::Nowhere,
                natural => Place::Beside(natural),
            })
            .collect();
        let mut room = (width + GAP).saturating_sub(fixed);
        let mut waiting = wrapped.len();
        for index in wrapped {
            let share = (room / waiting).saturating_sub(GAP);
            waiting -= 1;
            if natural[index] > share && share < LEAST_WRAPPED {
                places[index] = Place::Below;
            } else {
                let taken = natural[index].min(share);
                places[index] = Place::Beside(taken);
                room = room.saturating_sub(taken + GAP);
            }
        }
        Self { places, width }
    }

    /// Writes one row, in as many lines as it takes.
    fn write(&self, text: &mut String, columns: &[Column], cells: &[String], is_head: bool) {
        let broken: Vec<Vec<String>> = cells
            .iter()
            .zip(&self.places)
            .map(|(cell, place)| match place {
                Place::Beside(width) => broken_at(cell, *width),
                Place::Below | Place::Nowhere => Vec::new(),
            })
            .collect();
        let height = broken.iter().map(Vec::len).max().unwrap_or(0);
        for line in 0..height {
            let mut written = String::new();
            for ((column, place), lines) in columns.iter().zip(&self.places).zip(&broken) {
                let Place::Beside(width) = *place else {
                    continue;
                };
                let cell = lines.get(line).map_or("", String::as_str);
                let blanks = " ".repeat(width.saturating_sub(cell.width()));
                match column.kind {
                    Kind::Right => written.extend([blanks.as_str(), cell]),
                    Kind::Left | Kind::Wrapped => written.extend([cell, blanks.as_str()]),
                }
                written.push_str(&" ".repeat(GAP));
            }
            text.push_str(written.trim_end());
            text.push('\n');
        }
        if is_head {
            return;
        }
        let below = cells.iter().zip(&self.places);
        for (cell, _) in below.filter(|(_, place)| **place == Place::Below) {
            for line in broken_at(cell, self.width.saturating_sub(INDENT)) {
                text.push_str(&" ".repeat(INDENT));
                text.push_str(&line);
                text.push('\n');
            }
        }
    }
}

/// A cell without anything that would break a line or a column.
fn cleaned(cell: &str, kind: Kind) -> String {
    let plain: String = cell
        .trim()
        .chars()
        .map(|c| if c.is_control() { ' ' } else { c })
        .collect();
    match (kind, plain.strip_prefix('-')) {
        (Kind::Right, Some(rest)) if rest.starts_with(|c: char| c.is_ascii_digit()) => {
            format!("{MINUS}{rest}")
        }
        _ => plain,
    }
}

/// A text in lines of at most `width` characters, broken at blanks, and inside a word only where
/// the word alone is too long. No line at all for an empty text.
fn broken_at(text: &str, width: usize) -> Vec<String> {
    if text.width() <= width {
        return if text.is_empty() {
            Vec::new()
        } else {
            vec![text.to_owned()]
        };
    }
    let mut lines = Vec::new();
    let mut line = String::new();
    for word in text.split_whitespace() {
        let blank = usize::from(!line.is_empty());
        if line.width() + blank + word.width() <= width {
            line.push_str(&" ".repeat(blank));
            line.push_str(word);
            continue;
        }
        if !line.is_empty() {
            lines.push(std::mem::take(&mut line));
        }
        for character in word.chars() {
            if !line.is_empty() && line.width() + width_of(character) > width {
                lines.push(std::mem::take(&mut line));
            }
            line.push(character);
        }
    }
    lines.push(line);
    lines
}

fn width_of(character: char) -> usize {
    UnicodeWidthChar::width(character).unwrap_or(0)
}

#[cfg(test)]
mod tests {
    use super::*;
    use proptest::prelude::*;

    fn verdicts() -> TextTable {
        let mut table = TextTable::new(vec![
            Column::left("check"),
            Column::left(""),
            Column::right("figure"),
            Column::right("limit"),
            Column::wrapped("note"),
        ]);
        table.push([
            "overshoot",
            "near",
            "23 %",
            "25 %",
            "after the wheel stops at 4.05 s, on the priority port",
        ]);
        table.push(["dropout", "FAIL", "0.34 s", "0.1 s", ""]);
        table.push(["p\u{7}ilot", "n/a", "-10 bar", "10 bar", "no pilot relief"]);
        table
    }

    #[test]
    fn aligns_and_wraps() {
        assert_eq!(
            verdicts().to_text(66),
            "\
check             figure   limit  note
overshoot  near     23 %    25 %  after the wheel stops at 4.05 s,
                                  on the priority port
dropout    FAIL   0.34 s   0.1 s
p ilot     n/a   −10 bar  10 bar  no pilot relief
",
            "in columns"
        );
    }

    #[test]
    fn long_text_goes_below_in_a_narrow_terminal() {
        assert_eq!(
            verdicts().to_text(44),
            "\
check             figure   limit
overshoot  near     23 %    25 %
    after the wheel stops at 4.05 s, on the
    priority port
dropout    FAIL   0.34 s   0.1 s
p ilot     n/a   −10 bar  10 bar
    no pilot relief
",
            "below the rows"
        );
    }

    #[test]
    fn empty_columns_and_tables_take_no_room() {
        let mut table = TextTable::new(vec![
            Column::left("a"),
            Column::left("b"),
            Column::left("c"),
        ]);
        table.push(["1", "", "3"]);
        assert_eq!(
            table.to_text(80),
            "a  c\n1  3\n",
            "no gap for the empty column"
        );
        assert_eq!(TextTable::new(vec![]).to_text(80), "", "nothing");
    }

    #[test]
    fn wide_characters_count_twice() {
        let mut table = TextTable::new(vec![Column::left("name"), Column::right("n")]);
        table.push(["果園", "1"]);
        table.push(["abcd", "2"]);
        assert_eq!(
            table.to_text(80),
            "name  n\n果園  1\nabcd  2\n",
            "two columns each"
        );
    }

    proptest! {
        #[test]
        fn wrapping_keeps_every_word_and_the_width(text in "[a-zé果 ]{0,80}", width in 2_usize..40) {
            let lines = broken_at(&text, width);
            prop_assert!(lines.iter().all(|line| line.width() <= width), "{lines:?}");
            let squeezed = |text: &str| text.split_whitespace().collect::<String>();
            prop_assert_eq!(squeezed(&lines.concat()), squeezed(&text), "a character is lost");
        }

        #[test]
        fn tables_keep_to_the_width(note in "[a-z ]{0,120}", width in 30_usize..120) {
            let mut table = TextTable::new(vec![Column::left("check"), Column::wrapped("note")]);
            table.push(["overshoot", &note]);
            let text = table.to_text(width);
            prop_assert!(text.lines().all(|line| line.width() <= width), "{text}");
        }
    }
}
