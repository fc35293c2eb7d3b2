//! [`Factors`] in the shape in which diffsol takes a linear solver.

use diffsol::{LaError, LaLinearOp, Matrix, NalgebraContext, Vector};
// The trait that solvers implement; diffsol itself shows only what it derives from it.
use diffsol_la::LinearSolver;

use crate::factors::Factors;
use crate::problem::{Mat, Vect};

/// Solver of the linear equations of one Newton iteration.
#[derive(Default)]
pub(crate) struct LuSolver {
    matrix: Option<Mat>,
    factors: Factors,
}

impl LinearSolver<Mat> for LuSolver {
    fn set_sparsity<C: LaLinearOp<T = f64, V = Vect, M = Mat, C = NalgebraContext>>(
        &mut self,
        op: &C,
    ) {
        self.matrix = Some(Mat::zeros(op.nrows(), op.ncols(), *op.context()));
    }

    fn set_linearisation<C: LaLinearOp<T = f64, V = Vect, M = Mat, C = NalgebraContext>>(
        &mut self,
        op: &C,
    ) {
        let new = || Mat::zeros(op.nrows(), op.ncols(), *op.context());
        let matrix = self.matrix.get_or_insert_with(new);
        op.matrix_inplace(matrix);
        self.factors
            .factorise(op.nrows(), matrix.inner_mut().as_slice());
    }

    fn solve_in_place(&self, b: &mut Vect) -> Result<(), LaError> {
        self.solve_with(b, Factors::solve)
    }

    fn solve_transpose_in_place(&self, b: &mut Vect) -> Result<(), LaError> {
        self.solve_with(b, Factors::solve_transposed)
    }
}

impl LuSolver {
    fn solve_with(
        &self,
        b: &mut Vect,
        solve: impl Fn(&Factors, &mut [f64]) -> bool,
    ) -> Result<(), LaError> {
        let mut solved = true;
        b.for_each_batch_host([], |b, [], _| solved &= solve(&self.factors, b));
        if solved {
            Ok(())
        } else {
            Err(LaError::Other(
                "the iteration matrix is singular".to_owned(),
            ))
        }
    }
}
