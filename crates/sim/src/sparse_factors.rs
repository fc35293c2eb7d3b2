//! Triangular factors with the diagonal as pivots, for matrices that are mostly empty.

use crate::elimination_order::EliminationOrder;

/// A pivot that is this small against what it is the difference of has lost its digits.
const LEAST_PIVOT: f64 = 1e-10;

/// A diagonal entry this small against what elimination added to it has lost its digits.
const LARGEST_GROWTH: f64 = 1e10;

/// `A = L U` without exchange of rows, on the entries that may be other than zero.
///
/// An iteration matrix is the identity less a step times a Jacobian, whose diagonal is negative
/// in nearly every state, so its own diagonal makes good pivots. Both tests above compare numbers
/// of one unit, so they hold whatever units the states have; where one fails, the matrix is
/// refused and somebody else has to exchange rows.
#[derive(Debug, Default)]
pub(crate) struct SparseFactors {
    size: usize,
    /// Which entries, row by row, were ever other than zero.
    coupled: Vec<bool>,
    plan: EliminationOrder,
    /// Row by row; the working space of the factorisation.
    work: Vec<f64>,
    /// Sizes of what was added to each diagonal entry.
    added: Vec<f64>,
    /// Column of L and row of U that go with each place of the plan.
    lower: Vec<f64>,
    upper: Vec<f64>,
    /// Inverse pivots, step by step.
    inverse: Vec<f64>,
}

impl SparseFactors {
    /// Factorises the square matrix of `size` rows that stands column by column in
    /// `column_major`. False if it has to be refused.
    pub(crate) fn factorise(&mut self, size: usize, column_major: &[f64]) -> bool {
        self.load(size, column_major);
        let places = self.plan.partners().len();
        self.added.clear();
        self.added.resize(size, 0.0);
        self.inverse.clear();
        self.lower.clear();
        self.lower.resize(places, 0.0);
        self.upper.clear();
        self.upper.resize(places, 0.0);
        (0..size).all(|step| self.eliminate(step, column_major))
    }

    /// Copies the matrix, and makes a new plan if it has entries where none were before.
    fn load(&mut self, size: usize, column_major: &[f64]) {
        let mut stale = self.size != size || self.coupled.is_empty();
        if stale {
            self.size = size;
            self.coupled = vec![false; size * size];
            self.work = vec![0.0; size * size];
        }
        for (j, column) in column_major.chunks_exact(size.max(1)).enumerate() {
            for (i, &value) in column.iter().enumerate() {
                let place = i * size + j;
                self.work[place] = value;
                if value != 0.0 && !self.coupled[place] {
                    self.coupled[place] = true;
                    stale = true;
                }
            }
        }
        if stale {
            self.plan = EliminationOrder::of_least_degree(size, &self.coupled);
        }
    }

    fn eliminate(&mut self, step: usize, column_major: &[f64]) -> bool {
        let size = self.size;
        let unknown = self.plan.order[step];
        let pivot = self.work[unknown * size + unknown];
        let given = column_major[unknown * size + unknown].abs();
        let added = self.added[unknown];
        let sound = pivot.is_finite()
            && pivot.abs() > LEAST_PIVOT * (given + added)
            && added <= LARGEST_GROWTH * given;
        if !sound {
            return false;
        }
        let inverse = 1.0 / pivot;
        self.inverse.push(inverse);
        let places = self.plan.places(step);
        let partners = &self.plan.partners()[places.clone()];
        let upper = &mut self.upper[places.clone()];
        for (entry, &partner) in upper.iter_mut().zip(partners) {
            *entry = self.work[unknown * size + partner];
        }
        for (entry, &row) in self.lower[places].iter_mut().zip(partners) {
            let multiplier = self.work[row * size + unknown] * inverse;
            *entry = multiplier;
            if multiplier != 0.0 {
                let work = &mut self.work[row * size..(row + 1) * size];
                for (&above, &column) in upper.iter().zip(partners) {
                    let part = multiplier * above;
                    work[column] -= part;
                    if column == row {
                        self.added[row] += part.abs();
                    }
                }
            }
        }
        true
    }

    /// Replaces `b`, as long as the matrix, by the solution `x` of `A x = b`.
    #[inline]
    pub(crate) fn solve(&self, b: &mut [f64]) {
        let partners = self.plan.partners();
        for (step, &unknown) in self.plan.order.iter().enumerate() {
            let value = b[unknown];
            let places = self.plan.places(step);
            for (&row, entry) in partners[places.clone()].iter().zip(&self.lower[places]) {
                b[row] -= entry * value;
            }
        }
        for (step, &unknown) in self.plan.order.iter().enumerate().rev() {
            let mut value = b[unknown];
            let places = self.plan.places(step);
            for (&column, entry) in partners[places.clone()].iter().zip(&self.upper[places]) {
                value -= entry * b[column];
            }
            b[unknown] = value * self.inverse[step];
        }
    }

    /// Replaces `b`, as long as the matrix, by the solution `x` of `transpose(A) x = b`.
    pub(crate) fn solve_transposed(&self, b: &mut [f64]) {
        let partners = self.plan.partners();
        for (step, &unknown) in self.plan.order.iter().enumerate() {
            let value = b[unknown] * self.inverse[step];
            b[unknown] = value;
            let places = self.plan.places(step);
            for (&row, entry) in partners[places.clone()].iter().zip(&self.upper[places]) {
                b[row] -= entry * value;
            }
        }
        for (step, &unknown) in self.plan.order.iter().enumerate().rev() {
            let mut value = b[unknown];
            let places = self.plan.places(step);
            for (&column, entry) in partners[places.clone()].iter().zip(&self.lower[places]) {
                value -= entry * b[column];
            }
            b[unknown] = value;
        }
    }
}
