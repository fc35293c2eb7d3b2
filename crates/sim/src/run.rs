//! One run of a circuit over time.

use std::time::{Duration, Instant};

use helmsplit_model::{Circuit, InputProfiles, InputSegment};

use crate::audit::Audit;
use crate::circuit_system::{CircuitOnSegment, state_scales};
use crate::ending::RunEnd;
use crate::error::SimError;
use crate::integrate::{Piece, integrate};
use crate::options::SolverOptions;
use crate::recorder::CircuitRecorder;
use crate::settle::{SettleOptions, Settled, settle};
use crate::statistics::Statistics;
use crate::trace::Trace;
use crate::watch::Watch;

/// Where a run starts.
#[derive(Debug, Clone, PartialEq, Default)]
pub enum Start {
    /// At rest without pressure.
    Cold,
    /// Settled at the inputs of the first moment: what a user means by "from here". With a guess,
    /// such as the settled state of a similar circuit, no time is spent on waiting.
    #[default]
    Settled,
    /// Settled at the inputs of the first moment, looked for from this state first.
    SettledNear(Vec<f64>),
    /// In this state, SI, in the order of the circuit's states.
    From(Vec<f64>),
}

/// What to run.
#[derive(Debug, Clone, Copy)]
pub struct RunSetup<'a> {
    /// The circuit.
    pub circuit: &'a Circuit,
    /// Its inputs over time.
    pub inputs: &'a InputProfiles,
    /// Start time, s.
    pub from: f64,
    /// End time, s.
    pub to: f64,
    /// Start state.
    pub start: &'a Start,
    /// How to solve it.
    pub options: &'a SolverOptions,
}

/// What a run gives, whether it reached its end or not.
#[derive(Debug, Clone)]
pub struct RunResult {
    /// How it ended.
    pub end: RunEnd,
    /// States and signals over time, up to where it ended.
    pub trace: Trace,
    /// Volume and energy audits up to where it ended, if they were asked for.
    pub audit: Option<Audit>,
    /// How the start state was found, if it was looked for.
    pub settled: Option<Settled>,
    /// The state it ended in, SI.
    pub final_state: Vec<f64>,
    /// The time it ended at, s.
    pub final_time: f64,
    /// What it cost, the same on each machine of one kind.
    pub statistics: Statistics,
    /// How long it took on this machine, with everything around it.
    pub elapsed: Duration,
}

/// Runs a circuit.
///
/// The solver stops at each breakpoint of the inputs and starts anew where one jumps. The output
/// step only adds rows: the solver's steps, and with them all results, are the same with any.
///
/// # Errors
/// [`SimError`] if options, start state or times do not fit. A run that the solver gives up or
/// the user cancels is no error: see [`RunResult::end`].
pub fn run(setup: &RunSetup<'_>, watch: &mut Watch<'_>) -> Result<RunResult, SimError> {
    let begun = Instant::now();
    let &RunSetup {
        circuit,
        inputs,
        from,
        to,
        options,
        ..
    } = setup;
    options.check()?;
    if !(to > from && from.is_finite() && to.is_finite()) {
        return Err(SimError::Span {
            start: from,
            end: to,
        });
    }
    let scales = state_scales(circuit);
    let (segments, jumps) = segments(circuit, inputs, from, to, &scales);
    let (start_state, settled) = start_state(setup, &scales, watch)?;
    let pieces = pieces(&segments, &jumps, inputs, from, to);
    let mut recorder = CircuitRecorder::new(circuit, &segments, &jumps, from, options);
    let result = integrate(&pieces, from, &start_state, options, &mut recorder, watch)?;
    let (trace, audit) = recorder.finish(result.time, &result.state);
    Ok(RunResult {
        end: result.end,
        trace,
        audit,
        settled,
        final_state: result.state,
        final_time: result.time,
        statistics: result.statistics,
        elapsed: begun.elapsed(),
    })
}

/// The circuit on each piece between breakpoints, and whether an input jumps at its start.
fn segments<'a>(
    circuit: &'a Circuit,
    inputs: &InputProfiles,
    from: f64,
    to: f64,
    scales: &'a [f64],
) -> (Vec<CircuitOnSegment<'a>>, Vec<bool>) {
    let breakpoints = inputs.breakpoints(from, to);
    let starts = std::iter::once((from, false))
        .chain(breakpoints.iter().map(|point| (point.time, point.jump)));
    starts
        .map(|(time, jump)| {
            let segment = inputs.segment(time);
            (CircuitOnSegment::new(circuit, segment, scales), jump)
        })
        .unzip()
}

fn pieces<'s>(
    segments: &'s [CircuitOnSegment<'s>],
    jumps: &[bool],
    inputs: &InputProfiles,
    from: f64,
    to: f64,
) -> Vec<Piece<'s>> {
    let ends = inputs
        .breakpoints(from, to)
        .into_iter()
        .map(|point| point.time)
        .chain(std::iter::once(to));
    segments
        .iter()
        .zip(jumps)
        .zip(ends)
        .map(|((system, &jump), end)| Piece { system, end, jump })
        .collect()
}

fn start_state(
    setup: &RunSetup<'_>,
    scales: &[f64],
    watch: &mut Watch<'_>,
) -> Result<(Vec<f64>, Option<Settled>), SimError> {
    let circuit = setup.circuit;
    let first = setup.inputs.at(setup.from);
    let guess = match setup.start {
        Start::Cold => return Ok((circuit.cold_state(&first), None)),
        Start::From(state) => return Ok((state.clone(), None)),
        Start::Settled => None,
        Start::SettledNear(guess) => Some(guess.as_slice()),
    };
    let frozen = CircuitOnSegment::new(circuit, InputSegment::frozen(first), scales);
    let settled = settle(
        &frozen,
        circuit.drifting_states(),
        &circuit.cold_state(&first),
        guess,
        &SettleOptions::default(),
        watch,
    )?;
    Ok((settled.state.clone(), Some(settled)))
}
