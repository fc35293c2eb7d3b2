//! A [`System`] in the shape in which diffsol takes equations.

use std::cell::Cell;

use diffsol::{
    ConstantOp, Matrix, NalgebraContext, NalgebraMat, NalgebraVec, NonLinearOp,
    NonLinearOpJacobian, OdeBuilder, OdeEquations, OdeEquationsRef, OdeSolverProblem, Op,
    UnitCallable, Vector, VectorCommon,
};

use crate::error::SimError;
use crate::options::SolverOptions;
use crate::system::System;

/// Matrices of the solver.
pub(crate) type Mat = NalgebraMat<f64>;
/// Vectors of the solver.
pub(crate) type Vect = NalgebraVec<f64>;

/// Where the right-hand side last was not a finite number.
#[derive(Debug, Clone, Copy)]
pub(crate) struct NotFinite {
    /// Time, s.
    pub(crate) time: f64,
    /// Index of the first such state.
    pub(crate) state: usize,
}

/// The equations that diffsol integrates. The system behind them may be exchanged between two
/// steps, which is how the inputs go from one straight piece to the next.
pub(crate) struct Equations<'s> {
    system: Cell<&'s dyn System>,
    start: &'s [f64],
    context: NalgebraContext,
    /// Evaluations of the right-hand side.
    pub(crate) rhs_calls: Cell<u64>,
    /// Evaluations of the Jacobian.
    pub(crate) jacobian_calls: Cell<u64>,
    /// The last evaluation that was not finite.
    pub(crate) not_finite: Cell<Option<NotFinite>>,
}

impl<'s> Equations<'s> {
    fn new(system: &'s dyn System, start: &'s [f64]) -> Self {
        Self {
            system: Cell::new(system),
            start,
            context: NalgebraContext::default(),
            rhs_calls: Cell::new(0),
            jacobian_calls: Cell::new(0),
            not_finite: Cell::new(None),
        }
    }

    /// The system now integrated.
    pub(crate) fn system(&self) -> &'s dyn System {
        self.system.get()
    }

    /// Goes on with another system of the same size.
    pub(crate) fn exchange(&self, system: &'s dyn System) {
        self.system.set(system);
    }

    /// Evaluates the right-hand side, counts, and notes a result that is not finite.
    pub(crate) fn evaluate(&self, time: f64, y: &[f64], dy: &mut [f64]) {
        self.rhs_calls.set(self.rhs_calls.get() + 1);
        self.system.get().derivatives(time, y, dy);
        // Zero times a finite number is zero; anything else leaves NaN in the sum.
        let check: f64 = dy.iter().map(|rate| rate * 0.0).sum();
        if check.is_nan()
            && let Some(state) = dy.iter().position(|rate| !rate.is_finite())
        {
            self.not_finite.set(Some(NotFinite { time, state }));
        }
    }
}

/// Builds the diffsol problem of `system` from `start` at `time` (s).
///
/// # Errors
/// [`SimError::Setup`] if diffsol refuses it.
pub(crate) fn problem<'s>(
    system: &'s dyn System,
    start: &'s [f64],
    time: f64,
    options: &SolverOptions,
) -> Result<OdeSolverProblem<Equations<'s>>, SimError> {
    let rtol = options.relative_tolerance;
    let mut problem = OdeBuilder::<Mat>::new()
        .t0(time)
        .h0(options.initial_step)
        .rtol(rtol)
        .atol(system.scales().iter().map(|scale| rtol * scale))
        .build_from_eqn(Equations::new(system, start))
        .map_err(|error| SimError::Setup(error.to_string()))?;
    let ode = &mut problem.ode_options;
    ode.max_number_timesteps = usize::MAX;
    ode.max_nonlinear_solver_failures = options.max_newton_failures;
    ode.max_error_test_failures = options.max_error_failures;
    ode.nonlinear_solver_tolerance = options.nonlinear_tolerance;
    ode.min_timestep = options.min_step;
    Ok(problem)
}

/// Right-hand side, borrowed from the equations.
pub(crate) struct Rhs<'a, 's>(&'a Equations<'s>);

/// Start state, borrowed from the equations.
pub(crate) struct Init<'a, 's>(&'a Equations<'s>);

macro_rules! operator {
    ($type:ty) => {
        impl Op for $type {
            type T = f64;
            type V = Vect;
            type M = Mat;
            type C = NalgebraContext;

            fn context(&self) -> &NalgebraContext {
                &self.0.context
            }
            fn nstates(&self) -> usize {
                self.0.start.len()
            }
            fn nout(&self) -> usize {
                self.0.start.len()
            }
            fn nparams(&self) -> usize {
                0
            }
        }
    };
}
operator!(Rhs<'_, '_>);
operator!(Init<'_, '_>);

impl NonLinearOp for Rhs<'_, '_> {
    fn call_inplace(&self, x: &Vect, t: f64, y: &mut Vect) {
        y.for_each_batch_host([x], |dy, [y], _| self.0.evaluate(t, y, dy));
    }
}

impl NonLinearOpJacobian for Rhs<'_, '_> {
    fn jac_mul_inplace(&self, x: &Vect, t: f64, v: &Vect, y: &mut Vect) {
        // Not on the path of a run, which takes whole Jacobians.
        let size = self.nstates();
        let mut jacobian = Mat::zeros(size, size, self.0.context);
        self.jacobian_inplace(x, t, &mut jacobian);
        jacobian.gemv(1.0, v, 0.0, y);
    }

    fn jacobian_inplace(&self, x: &Vect, t: f64, y: &mut Mat) {
        let equations = self.0;
        equations
            .jacobian_calls
            .set(equations.jacobian_calls.get() + 1);
        equations
            .system
            .get()
            .jacobian(t, x.inner().as_slice(), y.inner_mut().as_mut_slice());
    }
}

impl ConstantOp for Init<'_, '_> {
    fn call_inplace(&self, _t: f64, y: &mut Vect) {
        y.for_each_batch_host([], |y, [], _| y.copy_from_slice(self.0.start));
    }
}

impl Op for Equations<'_> {
    type T = f64;
    type V = Vect;
    type M = Mat;
    type C = NalgebraContext;

    fn context(&self) -> &NalgebraContext {
        &self.context
    }
    fn nstates(&self) -> usize {
        self.start.len()
    }
    fn nout(&self) -> usize {
        self.start.len()
    }
    fn nparams(&self) -> usize {
        0
    }
}

impl<'a, 's> OdeEquationsRef<'a> for Equations<'s> {
    type Rhs = Rhs<'a, 's>;
    type Init = Init<'a, 's>;
    type Mass = UnitCallable<Mat>;
    type Root = UnitCallable<Mat>;
    type Out = UnitCallable<Mat>;
    type Reset = UnitCallable<Mat>;
}

impl<'s> OdeEquations for Equations<'s> {
    fn rhs(&self) -> Rhs<'_, 's> {
        Rhs(self)
    }

    fn init(&self) -> Init<'_, 's> {
        Init(self)
    }

    fn mass(&self) -> Option<UnitCallable<Mat>> {
        None
    }

    fn set_params(&mut self, _p: &Vect) {}

    fn get_params(&self, _p: &mut Vect) {}
}
