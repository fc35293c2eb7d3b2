//! The description that goes beside exported traces.

use std::path::Path;

use helmsplit_scenario::units::UnitSystem;
use helmsplit_scenario::write::save_atomically;
use serde::Serialize;

use crate::audit::Audit;
use crate::csv_export::column_heading;
use crate::ending::RunEnd;
use crate::error::SimError;
use crate::options::SolverOptions;
use crate::run::RunResult;
use crate::settle::Rest;
use crate::statistics::Statistics;

/// Layout of the sidecar; a reader that knows this number knows the fields.
const FORMAT: u32 = 1;

/// What was run: the caller knows where it came from.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Serialize)]
pub struct Origin<'a> {
    /// Name of the circuit.
    pub circuit: &'a str,
    /// Hash of the circuit that was run, in hexadecimal.
    pub circuit_hash: &'a str,
    /// Version of the program.
    pub version: &'a str,
}

/// Everything about a run beside its traces.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Sidecar<'a> {
    format: u32,
    #[serde(flatten)]
    origin: Origin<'a>,
    units: UnitSystem,
    end: &'a RunEnd,
    final_time_s: f64,
    start: Option<StartNote>,
    solver: &'a SolverOptions,
    statistics: &'a Statistics,
    audit: Option<&'a Audit>,
    columns: Vec<ColumnNote>,
}

/// How the start state was found.
#[derive(Debug, Clone, PartialEq, Serialize)]
struct StartNote {
    rest: Rest,
    text: String,
    residual_per_s: f64,
}

/// One column: its heading in the traces and its exact extremes over the solver's steps.
#[derive(Debug, Clone, PartialEq, Serialize)]
struct ColumnNote {
    heading: String,
    name: String,
    label: String,
    unit: &'static str,
    min: Option<f64>,
    min_time_s: Option<f64>,
    max: Option<f64>,
    max_time_s: Option<f64>,
}

impl<'a> Sidecar<'a> {
    /// Describes a run solved with `solver`, its columns in the units of `units`. Audits stay in
    /// SI, as their field names say nothing else. How long the run took is left out: the same run
    /// gives the same sidecar.
    #[must_use]
    pub fn new(
        origin: Origin<'a>,
        result: &'a RunResult,
        solver: &'a SolverOptions,
        units: UnitSystem,
    ) -> Self {
        let columns = result.trace.columns().iter().enumerate();
        let columns = columns
            .map(|(position, column)| {
                let unit = units.unit(column.quantity);
                let extreme = result.trace.extreme(position);
                ColumnNote {
                    heading: column_heading(&column.name, unit),
                    name: column.name.clone(),
                    label: column.label.clone(),
                    unit: unit.symbol(),
                    min: extreme.map(|e| unit.value_from_si(e.min)),
                    min_time_s: extreme.map(|e| e.min_time),
                    max: extreme.map(|e| unit.value_from_si(e.max)),
                    max_time_s: extreme.map(|e| e.max_time),
                }
            })
            .collect();
        let start = result.settled.as_ref().map(|settled| StartNote {
            rest: settled.rest,
            text: settled.to_string(),
            residual_per_s: settled.residual,
        });
        Self {
            format: FORMAT,
            origin,
            units,
            end: &result.end,
            final_time_s: result.final_time,
            start,
            solver,
            statistics: &result.statistics,
            audit: result.audit.as_ref(),
            columns,
        }
    }

    /// Writes the sidecar as JSON. The file appears whole or not at all.
    ///
    /// # Errors
    /// [`SimError::Write`] names the file and what the system said.
    pub fn write(&self, path: &Path) -> Result<(), SimError> {
        let mut text =
            serde_json::to_string_pretty(self).map_err(|error| SimError::Format(error.into()))?;
        text.push('\n');
        Ok(save_atomically(path, &text)?)
    }
}
