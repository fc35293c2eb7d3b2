//! Triangular factors of small, mostly empty matrices.
//!
//! A circuit's iteration matrix has some twenty rows with four or five entries each. Factors that
//! keep only their entries solve such equations in half the time of dense ones, and a run solves
//! them some ten times for each factorisation.

/// `P A = L U` with partial pivoting; entries that are zero are skipped.
#[derive(Debug, Default)]
pub(crate) struct Factors {
    size: usize,
    /// Row by row; the working space of the factorisation.
    rows: Vec<f64>,
    /// Row exchanged with row `k` in step `k`.
    exchanges: Vec<usize>,
    /// Entries below the diagonal of L, column by column; its diagonal is 1.
    lower: Entries,
    /// Entries above the diagonal of U, column by column.
    upper: Entries,
    /// Inverses of the diagonal of U.
    pivots: Vec<f64>,
    regular: bool,
}

/// Columns of a triangle with its entries only.
#[derive(Debug, Default)]
struct Entries {
    /// Where each column starts, and where the last one ends.
    starts: Vec<usize>,
    rows: Vec<usize>,
    values: Vec<f64>,
}

impl Entries {
    fn clear(&mut self) {
        self.starts.clear();
        self.starts.push(0);
        self.rows.clear();
        self.values.clear();
    }

    fn push(&mut self, row: usize, value: f64) {
        if value != 0.0 {
            self.rows.push(row);
            self.values.push(value);
        }
    }

    fn end_column(&mut self) {
        self.starts.push(self.rows.len());
    }

    fn column(&self, index: usize) -> impl Iterator<Item = (usize, f64)> {
        let range = self.starts[index]..self.starts[index + 1];
        let rows = self.rows[range.clone()].iter().copied();
        rows.zip(self.values[range].iter().copied())
    }
}

impl Factors {
    /// Factorises the square matrix of `size` rows that stands column by column in
    /// `column_major`. A singular matrix is kept as such, and refuses to solve.
    pub(crate) fn factorise(&mut self, size: usize, column_major: &[f64]) {
        self.size = size;
        self.rows.clear();
        self.rows.resize(size * size, 0.0);
        for (j, column) in column_major.chunks_exact(size.max(1)).enumerate() {
            for (i, &value) in column.iter().enumerate() {
                self.rows[i * size + j] = value;
            }
        }
        self.exchanges.clear();
        self.pivots.clear();
        self.regular = (0..size).all(|step| self.eliminate(step));
        if self.regular {
            self.compress();
        }
    }

    /// One step of Gaussian elimination; false if no pivot is left.
    fn eliminate(&mut self, step: usize) -> bool {
        let size = self.size;
        let mut pivot_row = step;
        let mut largest = 0.0;
        for row in step..size {
            let value = self.rows[row * size + step].abs();
            if value > largest {
                largest = value;
                pivot_row = row;
            }
        }
        self.exchanges.push(pivot_row);
        if largest < f64::MIN_POSITIVE || !largest.is_finite() {
            return false;
        }
        let (above, below) = self.rows.split_at_mut((step + 1) * size);
        let pivot = &mut above[step * size..];
        if pivot_row != step {
            let start = (pivot_row - step - 1) * size;
            pivot.swap_with_slice(&mut below[start..start + size]);
        }
        let inverse = 1.0 / pivot[step];
        self.pivots.push(inverse);
        for row in below.chunks_exact_mut(size) {
            if row[step] != 0.0 {
                let multiplier = row[step] * inverse;
                row[step] = multiplier;
                for (value, above) in row[step + 1..].iter_mut().zip(&pivot[step + 1..]) {
                    *value -= multiplier * above;
                }
            }
        }
        true
    }

    /// Gathers the entries of both triangles.
    fn compress(&mut self) {
        let size = self.size;
        self.lower.clear();
        self.upper.clear();
        for column in 0..size {
            for row in 0..column {
                self.upper.push(row, self.rows[row * size + column]);
            }
            for row in column + 1..size {
                self.lower.push(row, self.rows[row * size + column]);
            }
            self.upper.end_column();
            self.lower.end_column();
        }
    }

    /// Replaces `b` by the solution `x` of `A x = b`; false, with `b` untouched, if `A` is
    /// singular or of another size.
    #[must_use]
    pub(crate) fn solve(&self, b: &mut [f64]) -> bool {
        if !self.regular || b.len() != self.size {
            return false;
        }
        for (row, &other) in self.exchanges.iter().enumerate() {
            b.swap(row, other);
        }
        for column in 0..self.size {
            let value = b[column];
            for (row, entry) in self.lower.column(column) {
                b[row] -= entry * value;
            }
        }
        for column in (0..self.size).rev() {
            let value = b[column] * self.pivots[column];
            b[column] = value;
            for (row, entry) in self.upper.column(column) {
                b[row] -= entry * value;
            }
        }
        true
    }

    /// Replaces `b` by the solution `x` of `transpose(A) x = b`; as [`Self::solve`] otherwise.
    #[must_use]
    pub(crate) fn solve_transposed(&self, b: &mut [f64]) -> bool {
        if !self.regular || b.len() != self.size {
            return false;
        }
        for column in 0..self.size {
            let known: f64 = self.upper.column(column).map(|(row, e)| e * b[row]).sum();
            b[column] = (b[column] - known) * self.pivots[column];
        }
        for column in (0..self.size).rev() {
            let known: f64 = self.lower.column(column).map(|(row, e)| e * b[row]).sum();
            b[column] -= known;
        }
        for (row, &other) in self.exchanges.iter().enumerate().rev() {
            b.swap(row, other);
        }
        true
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Numbers in -1..1 (Numerical Recipes' 64-bit linear congruential constants).
    fn rolls(mut seed: u64) -> impl FnMut() -> f64 {
        move || {
            seed = seed
                .wrapping_mul(6_364_136_223_846_793_005)
                .wrapping_add(1_442_695_040_888_963_407);
            ((seed >> 11) as f64) / ((1u64 << 52) as f64) - 1.0
        }
    }

    #[test]
    fn solves_both_ways_whatever_is_empty() {
        let mut factors = Factors::default();
        for size in 1..30 {
            let mut roll = rolls(size as u64);
            let mut matrix = vec![0.0; size * size];
            for (place, value) in matrix.iter_mut().enumerate() {
                let diagonal = place % (size + 1) == 0;
                // A third of the entries and half of the diagonal: pivots must move.
                if roll() > if diagonal { 0.0 } else { 0.33 }
                    || place % size == (place / size + 1) % size
                {
                    *value = roll() * 10f64.powf(3.0 * roll());
                }
            }
            let x: Vec<f64> = (0..size).map(|_| roll()).collect();
            let times = |transposed: bool| -> Vec<f64> {
                let at = |i: usize, j: usize| {
                    if transposed {
                        matrix[i * size + j]
                    } else {
                        matrix[j * size + i]
                    }
                };
                (0..size)
                    .map(|i| (0..size).map(|j| at(i, j) * x[j]).sum())
                    .collect()
            };
            factors.factorise(size, &matrix);
            let (mut straight, mut transposed) = (times(false), times(true));
            assert!(factors.solve(&mut straight), "size {size}: regular");
            assert!(
                factors.solve_transposed(&mut transposed),
                "size {size}: regular"
            );
            for i in 0..size {
                assert!(
                    (straight[i] - x[i]).abs() < 1e-8,
                    "size {size}, x{i}: {}",
                    straight[i]
                );
                assert!(
                    (transposed[i] - x[i]).abs() < 1e-8,
                    "size {size}, x{i}: {}",
                    transposed[i]
                );
            }
        }
    }

    #[test]
    fn refuses_singular_and_broken_matrices() {
        let mut factors = Factors::default();
        for matrix in [
            [1.0, 2.0, 2.0, 4.0],
            [0.0; 4],
            [f64::NAN; 4],
            [f64::INFINITY, 0.0, 0.0, 1.0],
        ] {
            factors.factorise(2, &matrix);
            assert!(!factors.solve(&mut [1.0, 1.0]), "{matrix:?}");
        }
        factors.factorise(2, &[0.0, 1.0, 1.0, 0.0]);
        let mut b = [3.0, 5.0];
        assert!(factors.solve(&mut b), "an exchange of rows is regular");
        assert!(
            (b[0] - 5.0).abs() + (b[1] - 3.0).abs() < 1e-15,
            "exchanged: {b:?}"
        );
        assert!(!factors.solve(&mut [1.0; 3]), "three values for two rows");
    }
}
