//! Values over time, row by row.

/// A table of values over time: one row for each time, all columns of a row side by side, which
/// is how the solver delivers them.
#[derive(Debug, Clone, PartialEq)]
pub struct Table {
    width: usize,
    times: Vec<f64>,
    values: Vec<f64>,
}

impl Table {
    pub(crate) fn new(width: usize) -> Self {
        Self {
            width,
            times: Vec::new(),
            values: Vec::new(),
        }
    }

    pub(crate) fn push(&mut self, time: f64, row: &[f64]) {
        debug_assert_eq!(row.len(), self.width, "one value for each column");
        self.times.push(time);
        self.values.extend_from_slice(row);
    }

    /// The times, s, never decreasing; a time stands twice where an input jumps.
    #[must_use]
    pub fn times(&self) -> &[f64] {
        &self.times
    }

    /// Number of rows.
    #[must_use]
    pub fn len(&self) -> usize {
        self.times.len()
    }

    /// Whether there is no row.
    #[must_use]
    pub fn is_empty(&self) -> bool {
        self.times.is_empty()
    }

    /// All columns of one row, SI.
    ///
    /// # Panics
    /// If `index` is not below [`Self::len`].
    #[must_use]
    pub fn row(&self, index: usize) -> &[f64] {
        &self.values[index * self.width..(index + 1) * self.width]
    }

    /// One column, by its position.
    ///
    /// # Panics
    /// If the table is not that wide.
    #[must_use]
    pub fn column(&self, position: usize) -> Column<'_> {
        assert!(position < self.width, "column {position} of {}", self.width);
        Column {
            table: self,
            position,
        }
    }
}

/// One column of a [`Table`]: the values of one state or signal over time, SI.
#[derive(Debug, Clone, Copy)]
pub struct Column<'a> {
    table: &'a Table,
    position: usize,
}

impl<'a> Column<'a> {
    /// Number of values.
    #[must_use]
    pub fn len(&self) -> usize {
        self.table.len()
    }

    /// Whether there is no value.
    #[must_use]
    pub fn is_empty(&self) -> bool {
        self.table.is_empty()
    }

    /// The times of the values, s.
    #[must_use]
    pub fn times(&self) -> &'a [f64] {
        &self.table.times
    }

    /// The value in row `index`.
    ///
    /// # Panics
    /// If `index` is not below [`Self::len`].
    #[must_use]
    pub fn get(&self, index: usize) -> f64 {
        self.table.values[index * self.table.width + self.position]
    }

    /// The values in order.
    pub fn iter(&self) -> impl ExactSizeIterator<Item = f64> + DoubleEndedIterator + use<'a> {
        let Self { table, position } = *self;
        (0..table.len()).map(move |row| table.values[row * table.width + position])
    }

    /// The values and their times (s).
    pub fn points(&self) -> impl ExactSizeIterator<Item = (f64, f64)> + use<'a> {
        self.table.times.iter().copied().zip(self.iter())
    }

    /// The values, copied.
    #[must_use]
    pub fn to_vec(&self) -> Vec<f64> {
        self.iter().collect()
    }

    /// The value at `time` (s), on the straight line between the two rows around it; after the
    /// jump where there is one, held before the first and after the last row. `None` if there is
    /// no row.
    #[must_use]
    pub fn at(&self, time: f64) -> Option<f64> {
        let times = &self.table.times;
        let after = times.partition_point(|&t| t <= time);
        match (after.checked_sub(1), after < times.len()) {
            (None, false) => None,
            (None, true) => Some(self.get(0)),
            (Some(before), false) => Some(self.get(before)),
            (Some(before), true) => {
                let share = (time - times[before]) / (times[after] - times[before]);
                Some(self.get(before) + share * (self.get(after) - self.get(before)))
            }
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn table() -> Table {
        let mut table = Table::new(2);
        table.push(0.0, &[0.0, 10.0]);
        table.push(1.0, &[2.0, 20.0]);
        table.push(1.0, &[4.0, 20.0]);
        table.push(3.0, &[8.0, 40.0]);
        table
    }

    #[test]
    fn looks_up_between_rows_and_after_jumps() {
        let table = table();
        let column = table.column(0);
        for (time, value) in [(-1.0, 0.0), (0.5, 1.0), (1.0, 4.0), (2.0, 6.0), (9.0, 8.0)] {
            let got = column.at(time).unwrap();
            assert!((got - value).abs() < 1e-15, "{time} s: {got}");
        }
        assert!(
            Table::new(1).column(0).at(0.0).is_none(),
            "no row, no value"
        );
    }

    #[test]
    fn columns_and_rows_agree() {
        let table = table();
        assert_eq!(
            table.column(1).to_vec(),
            [10.0, 20.0, 20.0, 40.0],
            "second column"
        );
        assert_eq!(table.row(2), [4.0, 20.0], "third row");
    }
}
