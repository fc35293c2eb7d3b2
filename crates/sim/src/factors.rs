//! Triangular factors of the solver's iteration matrices.
//!
//! A circuit's iteration matrix has some twenty rows with four or five entries each, and a run
//! solves with it some ten times for each factorisation. Factors on the entries alone take a third
//! of the time of full ones; full ones with exchange of rows stand by for what they refuse.

use crate::dense_factors::DenseFactors;
use crate::sparse_factors::SparseFactors;

/// Factors of one square matrix.
#[derive(Debug, Default)]
pub(crate) struct Factors {
    size: usize,
    kind: Kind,
    sparse: SparseFactors,
    dense: DenseFactors,
}

/// Which factors hold.
#[derive(Debug, Default, Clone, Copy, PartialEq, Eq)]
enum Kind {
    #[default]
    Singular,
    Sparse,
    Dense,
}

impl Factors {
    /// Factorises the square matrix of `size` rows that stands column by column in
    /// `column_major`. A singular matrix is kept as such, and refuses to solve.
    pub(crate) fn factorise(&mut self, size: usize, column_major: &[f64]) {
        self.size = size;
        self.kind = if self.sparse.factorise(size, column_major) {
            Kind::Sparse
        } else if self.dense.factorise(size, column_major) {
            Kind::Dense
        } else {
            Kind::Singular
        };
    }

    /// Replaces `b` by the solution `x` of `A x = b`; false, with `b` untouched, if `A` is
    /// singular or of another size.
    #[must_use]
    pub(crate) fn solve(&self, b: &mut [f64]) -> bool {
        if b.len() != self.size {
            return false;
        }
        match self.kind {
            Kind::Singular => return false,
            Kind::Sparse => self.sparse.solve(b),
            Kind::Dense => self.dense.solve(b),
        }
        true
    }

    /// Replaces `b` by the solution `x` of `transpose(A) x = b`; as [`Self::solve`] otherwise.
    #[must_use]
    pub(crate) fn solve_transposed(&self, b: &mut [f64]) -> bool {
        if b.len() != self.size {
            return false;
        }
        match self.kind {
            Kind::Singular => return false,
            Kind::Sparse => self.sparse.solve_transposed(b),
            Kind::Dense => self.dense.solve_transposed(b),
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
    fn keeps_to_the_entries_where_the_diagonal_allows_it() {
        // A chain: each unknown is coupled to its neighbours, in units far apart.
        let size = 12;
        let unit = |i: usize| 10f64.powi(7 * (i as i32 % 3) - 7);
        let mut matrix = vec![0.0; size * size];
        for i in 0..size {
            for j in i.saturating_sub(1)..(i + 2).min(size) {
                let value = if i == j { 3.0 } else { -1.0 };
                matrix[j * size + i] = value * unit(i) / unit(j);
            }
        }
        let mut factors = Factors::default();
        factors.factorise(size, &matrix);
        assert_eq!(factors.kind, Kind::Sparse, "a good diagonal");
        let x: Vec<f64> = (0..size).map(|i| unit(i) * (i as f64 - 4.5)).collect();
        let mut b: Vec<f64> = (0..size)
            .map(|i| (0..size).map(|j| matrix[j * size + i] * x[j]).sum())
            .collect();
        assert!(factors.solve(&mut b), "regular");
        for i in 0..size {
            assert!(
                (b[i] / x[i] - 1.0).abs() < 1e-13,
                "x{i}: {} for {}",
                b[i],
                x[i]
            );
        }
        factors.factorise(2, &[1e-13, 1.0, 1.0, 1.0]);
        assert_eq!(factors.kind, Kind::Dense, "a bad diagonal exchanges rows");
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
