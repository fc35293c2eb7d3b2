//! Turns what the solver finds into the trace and the audits of a run.

use helmsplit_model::{Circuit, Readings};

use crate::audit::{Audit, AuditMeter};
use crate::circuit_system::CircuitOnSegment;
use crate::ending::GiveUp;
use crate::extremes::Extremes;
use crate::integrate::{Flow, Recorder, Step};
use crate::options::SolverOptions;
use crate::table::Table;
use crate::trace::{Trace, columns_of};

/// A grid time this close (s) to the end of a step is at the end of the step.
const SAME_TIME: f64 = 1e-12;

/// Records a run of a circuit.
pub(crate) struct CircuitRecorder<'a> {
    circuit: &'a Circuit,
    segments: &'a [CircuitOnSegment<'a>],
    /// Whether an input jumps at the start of each piece.
    jumps: &'a [bool],
    piece: usize,
    states: usize,
    readings: Readings,
    row: Vec<f64>,
    steps: Table,
    keep_steps: bool,
    extremes: Extremes,
    grid: Option<Grid>,
    audit: Option<AuditMeter>,
}

/// The uniform output grid: row `k` belongs to `start + k * step`.
struct Grid {
    start: f64,
    step: f64,
    table: Table,
}

impl Grid {
    fn next_time(&self) -> f64 {
        // Not summed up step by step, which would drift.
        self.start + self.step * self.table.len() as f64
    }
}

impl<'a> CircuitRecorder<'a> {
    pub(crate) fn new(
        circuit: &'a Circuit,
        segments: &'a [CircuitOnSegment<'a>],
        jumps: &'a [bool],
        start: f64,
        options: &SolverOptions,
    ) -> Self {
        let states = circuit.state_count();
        let width = states + circuit.signals().len();
        Self {
            circuit,
            segments,
            jumps,
            piece: 0,
            states,
            readings: Readings::default(),
            row: vec![0.0; width],
            steps: Table::new(width),
            keep_steps: options.keep_solver_steps,
            extremes: Extremes::new(width),
            grid: options.output_step.map(|step| Grid {
                start,
                step,
                table: Table::new(width),
            }),
            audit: options.audit.then(|| AuditMeter::new(circuit.accounts())),
        }
    }

    /// Evaluates the signals of the state that stands in the row.
    fn observe(&mut self, time: f64) {
        let inputs = self.segments[self.piece].segment().at(time);
        let (y, signals) = self.row.split_at_mut(self.states);
        self.circuit.observe(&inputs, y, &mut self.readings);
        for (value, &signal) in signals.iter_mut().zip(self.circuit.signals()) {
            *value = self.readings.get(signal);
        }
    }

    /// Keeps the row as one of the solver's steps.
    fn keep(&mut self, time: f64) {
        self.extremes.push(time, &self.row);
        if self.keep_steps {
            self.steps.push(time, &self.row);
        }
    }

    /// Writes the grid row at `time` from the row, if one is due there.
    fn write_grid_at(&mut self, time: f64) {
        if let Some(grid) = &mut self.grid
            && (grid.next_time() - time).abs() <= SAME_TIME
        {
            let due = grid.next_time();
            grid.table.push(due, &self.row);
        }
    }

    /// Writes the grid rows that lie within a step. One on its end waits: an input may jump there.
    fn write_grid_within(&mut self, step: &mut Step<'_>) -> Result<(), GiveUp> {
        let within = |grid: &Grid| grid.next_time() < step.time - SAME_TIME;
        if !self.grid.as_ref().is_some_and(within) {
            return Ok(());
        }
        while let Some(due) = self
            .grid
            .as_ref()
            .map(Grid::next_time)
            .filter(|due| *due < step.time - SAME_TIME)
        {
            step.at(due, &mut self.row[..self.states])?;
            self.observe(due);
            if let Some(grid) = &mut self.grid {
                grid.table.push(due, &self.row);
            }
        }
        Ok(())
    }

    /// The trace and the audits up to the state `y`, reached at `time` (s).
    pub(crate) fn finish(mut self, time: f64, y: &[f64]) -> (Trace, Option<Audit>) {
        self.row[..self.states].copy_from_slice(y);
        if self.grid.is_some() {
            self.observe(time);
            self.write_grid_at(time);
        }
        let trace = Trace::new(
            columns_of(self.circuit),
            self.steps,
            self.grid.map(|grid| grid.table),
            self.extremes,
        );
        (trace, self.audit.map(|meter| meter.finish(y)))
    }
}

impl Recorder for CircuitRecorder<'_> {
    fn begin(&mut self, piece: usize, time: f64, y: &[f64]) {
        self.piece = piece;
        self.row[..self.states].copy_from_slice(y);
        self.observe(time);
        // Where the inputs only bend, the last step's row holds the same values.
        if piece == 0 || self.jumps[piece] {
            self.keep(time);
        }
        self.write_grid_at(time);
        if let Some(meter) = &mut self.audit {
            meter.interrupt();
            meter.push(time, y, &self.readings);
        }
    }

    fn step(&mut self, step: &mut Step<'_>) -> Result<Flow, GiveUp> {
        self.write_grid_within(step)?;
        self.row[..self.states].copy_from_slice(step.y);
        self.observe(step.time);
        self.keep(step.time);
        if let Some(meter) = &mut self.audit {
            meter.push(step.time, step.y, &self.readings);
        }
        Ok(Flow::Continue)
    }
}
