//! How a run is solved.

use helmsplit_scenario::SolverSettings;
use helmsplit_scenario::choice::SolverMethod;
use serde::{Deserialize, Serialize};

use crate::error::SimError;

/// The integration method.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Default, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum Method {
    /// Backward differentiation formulas of variable order (Shampine & Reichelt 1997): the
    /// default, fewest evaluations on most circuits.
    #[default]
    Bdf,
    /// A four-stage singly diagonally implicit Runge-Kutta method of order 3 with an embedded
    /// error estimate: L-stable, so it steps over a ringing spool where the higher orders of
    /// [`Method::Bdf`] follow it.
    Esdirk34,
}

/// Solver settings of one run. The default suits a finished run; 1e-5 is enough while a value is
/// being dragged and for batches.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields, default)]
pub struct SolverOptions {
    /// Relative tolerance of a step; the absolute tolerance of each state is this times the
    /// state's typical size. 1e-12 to 0.01, default 1e-6.
    pub relative_tolerance: f64,
    /// Newton's iteration stops at this share of the tolerance of a step. Default 0.05: at 0.2
    /// the errors of the iteration show in the traces.
    pub nonlinear_tolerance: f64,
    /// Most steps of one run. Default 2,000,000.
    pub max_steps: usize,
    /// Shortest step, s. Default 1e-15.
    pub min_step: f64,
    /// Step with which the solver probes the equations for the size of its first step, at the
    /// start and after each jump of an input, s. Default 1e-6.
    pub initial_step: f64,
    /// A run that needs this many steps for less than [`Self::crawl_advance`] is given up.
    /// Default 5000.
    pub crawl_steps: usize,
    /// See [`Self::crawl_steps`], s. Default 1e-6: the fastest ringing that a valve shows is
    /// followed with steps of some 1e-6 s each.
    pub crawl_advance: f64,
    /// Most failures of Newton's iteration within one step. Default 20.
    pub max_newton_failures: usize,
    /// Most failures of the error test within one step. Default 40.
    pub max_error_failures: usize,
    /// Highest order of [`Method::Bdf`], 1 to 5. Default 3. Orders 4 and 5 are unstable for
    /// lightly damped fast oscillations (Hairer & Wanner, Solving Ordinary Differential
    /// Equations II, section V.1) and follow a spool's with short steps; smooth problems without
    /// such oscillations gain from them.
    pub highest_order: usize,
    /// The method.
    pub method: Method,
    /// Spacing of the output grid, s; the solver does not see it. Default: none.
    pub output_step: Option<f64>,
    /// Whether the volume and energy balances are integrated along the run. Default: yes.
    pub audit: bool,
    /// Whether each accepted step is kept in the trace. Default: yes.
    pub keep_solver_steps: bool,
}

impl Default for SolverOptions {
    fn default() -> Self {
        Self {
            relative_tolerance: 1e-6,
            nonlinear_tolerance: 0.05,
            max_steps: 2_000_000,
            min_step: 1e-15,
            initial_step: 1e-6,
            crawl_steps: 5000,
            crawl_advance: 1e-6,
            max_newton_failures: 20,
            max_error_failures: 40,
            highest_order: 3,
            method: Method::Bdf,
            output_step: None,
            audit: true,
            keep_solver_steps: true,
        }
    }
}

impl From<&SolverSettings> for SolverOptions {
    /// What a circuit file says, with the output grid it asks for; its duration is not an option
    /// of the solver.
    fn from(settings: &SolverSettings) -> Self {
        let &SolverSettings {
            relative_tolerance,
            output_step,
            max_steps,
            method,
            duration: _,
        } = settings;
        Self {
            relative_tolerance,
            output_step: Some(output_step),
            max_steps,
            method: match method {
                SolverMethod::Bdf => Method::Bdf,
                SolverMethod::Esdirk34 => Method::Esdirk34,
            },
            ..Self::default()
        }
    }
}

impl SolverOptions {
    /// The default with another relative tolerance.
    #[must_use]
    pub fn with_tolerance(relative_tolerance: f64) -> Self {
        Self {
            relative_tolerance,
            ..Self::default()
        }
    }

    /// Checks every range.
    ///
    /// # Errors
    /// [`SimError::Option`] names the first option outside its range.
    #[allow(clippy::too_many_lines, reason = "a table of ranges")]
    pub fn check(&self) -> Result<(), SimError> {
        let any = f64::MAX;
        let grid = self.output_step.unwrap_or(1.0);
        let ranges = [
            (
                "relative_tolerance",
                self.relative_tolerance,
                1e-12,
                1e-2,
                "1e-12 to 0.01",
            ),
            (
                "nonlinear_tolerance",
                self.nonlinear_tolerance,
                1e-6,
                1.0,
                "1e-6 to 1",
            ),
            (
                "min_step",
                self.min_step,
                f64::EPSILON,
                1e-3,
                "2.3e-16 s to 1e-3 s",
            ),
            (
                "initial_step",
                self.initial_step,
                1e-12,
                1.0,
                "1e-12 s to 1 s",
            ),
            (
                "crawl_advance",
                self.crawl_advance,
                0.0,
                any,
                "not negative",
            ),
            (
                "highest_order",
                self.highest_order as f64,
                1.0,
                5.0,
                "1 to 5",
            ),
            ("max_steps", self.max_steps as f64, 1.0, any, "at least 1"),
            (
                "crawl_steps",
                self.crawl_steps as f64,
                100.0,
                any,
                "at least 100",
            ),
            ("output_step", grid, 1e-9, any, "at least 1e-9 s"),
        ];
        for (option, value, low, high, allowed) in ranges {
            if !(low..=high).contains(&value) {
                return Err(SimError::Option {
                    option,
                    value,
                    allowed,
                });
            }
        }
        Ok(())
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn default_is_within_its_own_ranges() {
        assert!(SolverOptions::default().check().is_ok(), "default options");
    }

    #[test]
    fn names_the_option_out_of_range() {
        let options = SolverOptions {
            relative_tolerance: f64::NAN,
            ..SolverOptions::default()
        };
        let text = options.check().unwrap_err().to_string();
        assert!(text.contains("relative_tolerance"), "{text}");
        let options = SolverOptions {
            highest_order: 6,
            ..SolverOptions::default()
        };
        let text = options.check().unwrap_err().to_string();
        assert!(text.contains("highest_order is 6"), "{text}");
    }
}
