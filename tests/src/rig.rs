//! A circuit on the test rig: a circuit file that comes with the program, changed by the paths of
//! its parameters, driven, brought to rest and run.

use helmsplit_model::{Circuit, Input, InputSegment, Inputs, Readings, Signal};
use helmsplit_scenario::{Preset, Scenario};
use helmsplit_sim::{
    CircuitOnSegment, Rest, RunResult, RunSetup, SettleOptions, SolverOptions, Start, Watch, run,
    settle, state_scales,
};

use crate::trouble::Tried;

/// A scenario under test. Whatever a test does not set stands as in the circuit file.
#[derive(Debug, Clone)]
pub struct Rig {
    /// The scenario.
    pub scenario: Scenario,
}

impl Rig {
    /// A circuit that comes with the program, with every input at its level: no manoeuvre.
    ///
    /// # Errors
    /// If there is no such circuit or it does not read.
    pub fn preset(key: &str) -> Tried<Self> {
        let preset = Preset::from_key(key).ok_or_else(|| format!("no circuit {key}"))?;
        let mut scenario = preset.scenario()?;
        scenario.manoeuvre.templates.clear();
        for input in Input::ALL {
            scenario.manoeuvre.free_mut(input).clear();
        }
        Ok(Self { scenario })
    }

    /// The orchard carrier with throttles into given pressures on both ports, as on a test bench.
    ///
    /// # Errors
    /// If the circuit refuses a value.
    pub fn bench(speed: &str, priority: &str, excess: &str) -> Tried<Self> {
        Self::preset("orchard_carrier")?
            .set("steering.kind", "bench throttle")?
            .set("excess.kind", "bench throttle")?
            .hold(Input::EngineSpeed, speed)?
            .hold(Input::BenchPressure, priority)?
            .hold(Input::ExcessPressure, excess)
    }

    /// The same with one value set by its path.
    ///
    /// # Errors
    /// If there is no such path or the value is refused.
    pub fn set(mut self, path: &str, text: &str) -> Tried<Self> {
        self.scenario.set(path, text)?;
        Ok(self)
    }

    /// The same with one input at a level.
    ///
    /// # Errors
    /// If the level does not read.
    pub fn hold(self, input: Input, level: &str) -> Tried<Self> {
        self.drive(input, &[("0 s", level)])
    }

    /// The same with one input through breakpoints.
    ///
    /// # Errors
    /// If a breakpoint does not read.
    pub fn drive(mut self, input: Input, points: &[(&str, &str)]) -> Tried<Self> {
        self.scenario.manoeuvre.set_free(input, points)?;
        Ok(self)
    }

    /// Brings the circuit to rest under the first inputs.
    ///
    /// # Errors
    /// If the scenario is refused.
    pub fn rest(&self) -> Tried<AtRest> {
        at_rest(
            &self.scenario.circuit()?,
            self.scenario.inputs()?.at(0.0),
            None,
        )
    }

    /// The same, waiting from another state than the cold one.
    ///
    /// # Errors
    /// If the scenario is refused or the state does not fit.
    pub fn rest_from(&self, state: &[f64]) -> Tried<AtRest> {
        let circuit = self.scenario.circuit()?;
        let inputs = self.scenario.inputs()?.at(0.0);
        at_rest(&circuit, inputs, Some(state))
    }

    /// Runs the circuit at the default tolerance up to `end` (s). A run that does not finish is
    /// trouble.
    ///
    /// # Errors
    /// If the scenario is refused or the solver gives up.
    pub fn run(&self, start: &Start, end: f64) -> Tried<RunResult> {
        self.run_with(start, end, &SolverOptions::default())
    }

    /// The same with other solver options.
    ///
    /// # Errors
    /// As [`Self::run`].
    pub fn run_with(&self, start: &Start, end: f64, options: &SolverOptions) -> Tried<RunResult> {
        let setup = RunSetup {
            circuit: &self.scenario.circuit()?,
            inputs: &self.scenario.inputs()?,
            from: 0.0,
            to: end,
            start,
            options,
        };
        let result = run(&setup, &mut Watch::none())?;
        if result.end.is_finished() {
            Ok(result)
        } else {
            Err(result.end.into())
        }
    }
}

/// Brings a circuit to rest under steady inputs, waiting from a state, or else from the cold one.
///
/// # Errors
/// If the state does not fit.
pub fn at_rest(circuit: &Circuit, inputs: Inputs, from: Option<&[f64]>) -> Tried<AtRest> {
    let scales = state_scales(circuit);
    let settled = settle(
        &CircuitOnSegment::new(circuit, InputSegment::frozen(inputs), &scales),
        circuit.drifting_states(),
        from.unwrap_or(&circuit.cold_state(&inputs)),
        None,
        &SettleOptions::default(),
        &mut Watch::none(),
    )?;
    let mut readings = Readings::default();
    circuit.observe(&inputs, &settled.state, &mut readings);
    Ok(AtRest {
        circuit: circuit.clone(),
        inputs,
        state: settled.state,
        rest: settled.rest,
        readings,
    })
}

/// A circuit at rest.
#[derive(Debug, Clone)]
pub struct AtRest {
    /// The circuit.
    pub circuit: Circuit,
    /// Its inputs.
    pub inputs: Inputs,
    /// The state, SI.
    pub state: Vec<f64>,
    /// Whether, and how, it came to rest.
    pub rest: Rest,
    readings: Readings,
}

impl AtRest {
    /// A state by its short name, SI; not a number if there is none.
    #[must_use]
    pub fn state(&self, name: &str) -> f64 {
        self.circuit
            .state_index(name)
            .map_or(f64::NAN, |at| self.state[at])
    }

    /// A signal, SI.
    #[must_use]
    pub fn signal(&self, signal: Signal) -> f64 {
        self.readings.get(signal)
    }

    /// Priority flow, m3/s.
    #[must_use]
    pub fn priority_flow(&self) -> f64 {
        self.signal(Signal::PriorityFlow)
    }

    /// Excess flow, m3/s.
    #[must_use]
    pub fn excess_flow(&self) -> f64 {
        self.signal(Signal::ExcessFlow)
    }
}

/// Mean of a state or signal over a span (s) of a run, by the trapezoidal rule on the solver's
/// steps; not a number if there is no such trace.
#[must_use]
pub fn mean(run: &RunResult, name: &str, from: f64, to: f64) -> f64 {
    let Ok(column) = run.trace.named(name) else {
        return f64::NAN;
    };
    let times = column.times();
    let (mut area, mut span) = (0.0, 0.0);
    for row in 1..column.len() {
        if times[row - 1] >= from && times[row] <= to {
            let dt = times[row] - times[row - 1];
            area += 0.5 * dt * (column.get(row - 1) + column.get(row));
            span += dt;
        }
    }
    area / span
}

/// Least and largest value of a state or signal over a span (s) of a run, on the solver's steps.
#[must_use]
pub fn range(run: &RunResult, name: &str, from: f64, to: f64) -> (f64, f64) {
    let points = run.trace.named(name).map(|column| column.points());
    points
        .into_iter()
        .flatten()
        .filter(|(time, _)| (from..=to).contains(time))
        .fold(
            (f64::INFINITY, f64::NEG_INFINITY),
            |(low, high), (_, value)| (low.min(value), high.max(value)),
        )
}

/// The last value of a state or signal of a run; not a number if there is no such trace.
#[must_use]
pub fn last(run: &RunResult, name: &str) -> f64 {
    run.trace
        .named(name)
        .ok()
        .and_then(|column| column.iter().last())
        .unwrap_or(f64::NAN)
}
