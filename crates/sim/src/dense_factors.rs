//! Triangular factors with exchange of rows, for any matrix.

/// `P A = L U` with partial pivoting.
#[derive(Debug, Default)]
pub(crate) struct DenseFactors {
    size: usize,
    /// Row by row: L below the diagonal, its own diagonal being 1, and U on and above it.
    rows: Vec<f64>,
    /// Row exchanged with row `k` in step `k`.
    exchanges: Vec<usize>,
}

impl DenseFactors {
    /// Factorises the square matrix of `size` rows that stands column by column in
    /// `column_major`. False if it is singular.
    pub(crate) fn factorise(&mut self, size: usize, column_major: &[f64]) -> bool {
        self.size = size;
        self.rows.clear();
        self.rows.resize(size * size, 0.0);
        for (j, column) in column_major.chunks_exact(size.max(1)).enumerate() {
            for (i, &value) in column.iter().enumerate() {
                self.rows[i * size + j] = value;
            }
        }
        self.exchanges.clear();
        (0..size).all(|step| self.eliminate(step))
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
        for row in below.chunks_exact_mut(size) {
            if row[step] != 0.0 {
                let multiplier = row[step] / pivot[step];
                row[step] = multiplier;
                for (value, above) in row[step + 1..].iter_mut().zip(&pivot[step + 1..]) {
                    *value -= multiplier * above;
                }
            }
        }
        true
    }

    fn row(&self, index: usize) -> &[f64] {
        &self.rows[index * self.size..(index + 1) * self.size]
    }

    /// Replaces `b`, as long as the matrix, by the solution `x` of `A x = b`.
    pub(crate) fn solve(&self, b: &mut [f64]) {
        for (row, &other) in self.exchanges.iter().enumerate() {
            b.swap(row, other);
        }
        for i in 0..self.size {
            let known: f64 = self.row(i)[..i].iter().zip(&*b).map(|(l, x)| l * x).sum();
            b[i] -= known;
        }
        for i in (0..self.size).rev() {
            let row = self.row(i);
            let known: f64 = row[i + 1..]
                .iter()
                .zip(&b[i + 1..])
                .map(|(u, x)| u * x)
                .sum();
            b[i] = (b[i] - known) / row[i];
        }
    }

    /// Replaces `b`, as long as the matrix, by the solution `x` of `transpose(A) x = b`.
    pub(crate) fn solve_transposed(&self, b: &mut [f64]) {
        for i in 0..self.size {
            let row = self.row(i);
            let value = b[i] / row[i];
            b[i] = value;
            for (later, u) in b[i + 1..].iter_mut().zip(&row[i + 1..]) {
                *later -= u * value;
            }
        }
        for i in (0..self.size).rev() {
            let value = b[i];
            for (earlier, l) in b[..i].iter_mut().zip(self.row(i)) {
                *earlier -= l * value;
            }
        }
        for (row, &other) in self.exchanges.iter().enumerate().rev() {
            b.swap(row, other);
        }
    }
}
