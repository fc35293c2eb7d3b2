//! What the solver integrates: a right-hand side with its exact Jacobian.

/// A first-order system `y' = f(t, y)`.
///
/// The solver sees systems through this trait only, so that circuits and published test problems
/// run through the same compiled code.
pub trait System {
    /// Number of states.
    fn size(&self) -> usize;

    /// Typical size of each state, in its unit: absolute tolerances and residuals are measured
    /// against it.
    fn scales(&self) -> &[f64];

    /// Writes `f(time, y)` into `dy`; `time` in s.
    fn derivatives(&self, time: f64, y: &[f64], dy: &mut [f64]);

    /// Writes the Jacobian: d `dy[i]` / d `y[j]` at `column_major[j * size + i]`.
    fn jacobian(&self, time: f64, y: &[f64], column_major: &mut [f64]);

    /// What a person calls state `index`, for error messages.
    fn state_name(&self, index: usize) -> String {
        format!("y{}", index + 1)
    }
}

/// A system some of whose states are kept where they are: their derivative is zero.
///
/// Used to look for a state of rest of circuits in which something turns or moves at a steady
/// rate (docs/model.md, M11).
pub(crate) struct Held<'a> {
    inner: &'a dyn System,
    held: &'a [usize],
}

impl<'a> Held<'a> {
    /// Holds the states with the indices `held`.
    pub(crate) fn new(inner: &'a dyn System, held: &'a [usize]) -> Self {
        Self { inner, held }
    }
}

impl System for Held<'_> {
    fn size(&self) -> usize {
        self.inner.size()
    }

    fn scales(&self) -> &[f64] {
        self.inner.scales()
    }

    fn derivatives(&self, time: f64, y: &[f64], dy: &mut [f64]) {
        self.inner.derivatives(time, y, dy);
        for &row in self.held {
            dy[row] = 0.0;
        }
    }

    fn jacobian(&self, time: f64, y: &[f64], column_major: &mut [f64]) {
        self.inner.jacobian(time, y, column_major);
        let size = self.size();
        for &row in self.held {
            for column in 0..size {
                column_major[column * size + row] = 0.0;
            }
        }
    }

    fn state_name(&self, index: usize) -> String {
        self.inner.state_name(index)
    }
}
