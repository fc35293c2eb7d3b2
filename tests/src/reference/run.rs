//! A run of the engine beside a reference trace.

use helmsplit_sim::{RunResult, RunSetup, SolverOptions, Start, Watch, run};

use super::Reference;
use crate::trouble::Tried;

/// Every time of the references is a whole number of these, s.
pub const GRID: f64 = 1e-3;

/// The largest deviation of one state from its reference, in typical sizes of the state.
#[derive(Debug, Clone, PartialEq)]
pub struct Deviation {
    /// The state.
    pub state: String,
    /// How large.
    pub size: f64,
    /// When, s.
    pub time: f64,
}

impl Reference {
    /// Runs the circuit of the reference, cold start, at a relative tolerance; the output grid
    /// of [`GRID`] holds every time of the reference.
    ///
    /// # Errors
    /// If the scenario is refused.
    pub fn run(&self, tolerance: f64) -> Tried<RunResult> {
        let scenario = self.scenario()?;
        let options = SolverOptions {
            output_step: Some(GRID),
            ..SolverOptions::with_tolerance(tolerance)
        };
        let setup = RunSetup {
            circuit: &scenario.circuit()?,
            inputs: &scenario.inputs()?,
            from: 0.0,
            to: scenario.solver().duration,
            start: &Start::Cold,
            options: &options,
        };
        Ok(run(&setup, &mut Watch::none())?)
    }

    /// How far each state of a run lies from the reference at most, at any of its times. States
    /// of parts that the circuit does not have are left out.
    ///
    /// # Errors
    /// If the run has no row at a time of the reference.
    pub fn deviations(&self, run: &RunResult) -> Tried<Vec<Deviation>> {
        let grid = run.trace.grid().ok_or("the run has no output grid")?;
        let times: Vec<f64> = self.times().collect();
        let mut all = Vec::new();
        for state in self.states() {
            let Some(position) = run.trace.position(state) else {
                continue;
            };
            let (Some(expected), Some(scale)) = (self.column(state), self.scale(state)) else {
                return Err(format!("{state} has no values or no size").into());
            };
            let mut worst = Deviation {
                state: state.to_owned(),
                size: 0.0,
                time: 0.0,
            };
            for (&time, expected) in times.iter().zip(expected) {
                let row = (time / GRID).round() as usize;
                let at = grid.times().get(row).copied().unwrap_or(f64::NAN);
                if (at - time).abs() > 1e-9 || at.is_nan() {
                    return Err(format!("no row at {time} s").into());
                }
                let size = (grid.row(row)[position] - expected).abs() / scale;
                if size > worst.size || size.is_nan() {
                    worst = Deviation {
                        size,
                        time,
                        ..worst
                    };
                }
            }
            all.push(worst);
        }
        Ok(all)
    }

    /// The largest of [`Self::deviations`].
    ///
    /// # Errors
    /// As [`Self::deviations`].
    pub fn largest_deviation(&self, run: &RunResult) -> Tried<Deviation> {
        let largest = self
            .deviations(run)?
            .into_iter()
            .max_by(|a, b| a.size.total_cmp(&b.size));
        Ok(largest.ok_or("no state in common")?)
    }
}
