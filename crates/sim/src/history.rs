//! The differences that a BDF solver remembers, with a cap on the order.
//!
//! Orders 4 and 5 are not stable for lightly damped fast oscillations, such as a spool's mass on
//! trapped oil, and then follow them with needlessly short steps. diffsol has no option for the
//! highest order, but takes the matrix of its backward differences as a type parameter: this one
//! makes the differences that would argue for an order above the cap look infinite, so that the
//! solver never finds it worth while. They are overwritten by the next step before they are used.

use std::cell::Cell;
use std::ops::{Add, AddAssign, Mul, Sub, SubAssign};

use diffsol::matrix::sparsity::{Dense, DenseRef};
use diffsol::{
    DenseMatrix, LaError, Matrix, MatrixCommon, NalgebraContext, NalgebraVecMut, NalgebraVecRef,
    Scale, Vector,
};

use crate::problem::{Mat, Vect};

/// Index vectors of the solver's vectors.
type Index = <Vect as Vector>::Index;

/// Stands for infinity; its square overflows, it itself does not.
const HUGE: f64 = 1e300;

thread_local! {
    /// The cap for matrices made next on this thread: diffsol makes them with nothing but a size.
    static HIGHEST_ORDER: Cell<usize> = const { Cell::new(usize::MAX) };
}

/// Backward differences, a column for each order.
#[derive(Debug, Clone)]
pub(crate) struct History {
    inner: Mat,
    highest_order: usize,
}

impl History {
    /// Runs `make`, in which diffsol makes its matrices, with a cap on their order.
    pub(crate) fn with_highest_order<T>(order: usize, make: impl FnOnce() -> T) -> T {
        let before = HIGHEST_ORDER.replace(order);
        let made = make();
        HIGHEST_ORDER.set(before);
        made
    }

    fn capped(inner: Mat) -> Self {
        Self {
            inner,
            highest_order: HIGHEST_ORDER.get(),
        }
    }
}

impl MatrixCommon for History {
    type V = Vect;
    type T = f64;
    type C = NalgebraContext;
    type Inner = <Mat as MatrixCommon>::Inner;

    fn nrows(&self) -> usize {
        self.inner.nrows()
    }
    fn ncols(&self) -> usize {
        self.inner.ncols()
    }
    fn inner(&self) -> &Self::Inner {
        self.inner.inner()
    }
}

impl Mul<Scale<f64>> for History {
    type Output = Self;
    fn mul(mut self, factor: Scale<f64>) -> Self {
        self.inner = self.inner * factor;
        self
    }
}

impl Add<&Self> for History {
    type Output = Self;
    fn add(mut self, other: &Self) -> Self {
        self += other;
        self
    }
}

impl Sub<&Self> for History {
    type Output = Self;
    fn sub(mut self, other: &Self) -> Self {
        self -= other;
        self
    }
}

impl AddAssign<&Self> for History {
    fn add_assign(&mut self, other: &Self) {
        self.inner += &other.inner;
    }
}

impl SubAssign<&Self> for History {
    fn sub_assign(&mut self, other: &Self) {
        self.inner -= &other.inner;
    }
}

impl Matrix for History {
    type Sparsity = Dense<Self>;
    type SparsityRef<'a> = DenseRef<'a, Self>;

    fn sparsity(&self) -> Option<Self::SparsityRef<'_>> {
        None
    }
    fn context(&self) -> &NalgebraContext {
        self.inner.context()
    }
    fn inner_mut(&mut self) -> &mut Self::Inner {
        self.inner.inner_mut()
    }
    fn partition_indices_by_zero_diagonal(&self) -> (Index, Index) {
        self.inner.partition_indices_by_zero_diagonal()
    }
    fn gemv(&self, alpha: f64, x: &Vect, beta: f64, y: &mut Vect) {
        self.inner.gemv(alpha, x, beta, y);
    }
    fn copy_from(&mut self, other: &Self) {
        self.inner.copy_from(&other.inner);
    }
    fn zeros(rows: usize, columns: usize, context: NalgebraContext) -> Self {
        Self::capped(Mat::zeros(rows, columns, context))
    }
    fn new_from_sparsity(
        rows: usize,
        columns: usize,
        _sparsity: Option<Self::Sparsity>,
        context: NalgebraContext,
    ) -> Self {
        Self::zeros(rows, columns, context)
    }
    fn from_diagonal(diagonal: &Vect) -> Self {
        Self::capped(Mat::from_diagonal(diagonal))
    }
    fn set_column(&mut self, column: usize, values: &Vect) {
        self.inner.set_column(column, values);
    }
    fn add_column_to_vector(&self, column: usize, values: &mut Vect) {
        self.inner.add_column_to_vector(column, values);
    }
    fn add_columns_to_batched_vector(&self, values: &mut Vect) {
        self.inner.add_columns_to_batched_vector(values);
    }
    fn set_data_with_indices(&mut self, to: &Index, from: &Index, data: &Vect) {
        self.inner.set_data_with_indices(to, from, data);
    }
    fn gather(&mut self, other: &Self, indices: &Index) {
        self.inner.gather(&other.inner, indices);
    }
    fn scale_add_and_assign(&mut self, x: &Self, beta: f64, y: &Self) {
        self.inner.scale_add_and_assign(&x.inner, beta, &y.inner);
    }
    fn triplet_iter(
        &self,
    ) -> (
        impl Iterator<Item = (usize, usize)> + '_,
        impl Iterator<Item = f64> + '_,
    ) {
        self.inner.triplet_iter()
    }
    fn try_from_triplets(
        rows: usize,
        columns: usize,
        places: Vec<(usize, usize)>,
        values: Vec<f64>,
        context: NalgebraContext,
    ) -> Result<Self, LaError> {
        Mat::try_from_triplets(rows, columns, places, values, context).map(Self::capped)
    }
}

impl DenseMatrix for History {
    fn update_backward_diff(&mut self, order: usize, correction: &Vect) {
        self.inner.update_backward_diff(order, correction);
        // The solver weighs order + 1 by the column of order + 2.
        if order >= self.highest_order {
            let rows = self.inner.nrows();
            let column = (order + 2) * rows;
            if let Some(values) = self
                .inner
                .inner_mut()
                .as_mut_slice()
                .get_mut(column..column + rows)
            {
                values.fill(HUGE);
            }
        }
    }
    fn mul_cols_by(&mut self, columns: usize, factors: &[f64]) {
        self.inner.mul_cols_by(columns, factors);
    }
    fn gemv_cols(&self, start: usize, end: usize, alpha: f64, x: &[f64], beta: f64, y: &mut Vect) {
        self.inner.gemv_cols(start, end, alpha, x, beta, y);
    }
    fn column(&self, column: usize) -> NalgebraVecRef<'_, f64> {
        self.inner.column(column)
    }
    fn column_mut(&mut self, column: usize) -> NalgebraVecMut<'_, f64> {
        self.inner.column_mut(column)
    }
    fn set_index(&mut self, row: usize, column: usize, value: f64) {
        self.inner.set_index(row, column, value);
    }
    fn set_index_batch(&mut self, batch: usize, row: usize, column: usize, value: f64) {
        self.inner.set_index_batch(batch, row, column, value);
    }
    fn get_index(&self, row: usize, column: usize) -> f64 {
        self.inner.get_index(row, column)
    }
    fn resize_cols(&mut self, columns: usize) {
        self.inner.resize_cols(columns);
    }
    fn from_vec(rows: usize, columns: usize, data: Vec<f64>, context: NalgebraContext) -> Self {
        Self::capped(Mat::from_vec(rows, columns, data, context))
    }
}
