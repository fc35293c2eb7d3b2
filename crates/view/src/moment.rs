//! A circuit at one moment.

use helmsplit_model::{Circuit, Inputs, Observer, Readings, Signal};
use helmsplit_sim::Trace;

/// Every state and signal of a circuit at one time, SI.
#[derive(Debug, Clone, PartialEq)]
pub struct Moment {
    /// Time in the run, s.
    pub time: f64,
    states: Vec<(String, f64)>,
    readings: Readings,
}

impl Moment {
    /// A state of a circuit under its inputs.
    ///
    /// # Panics
    /// If `states` has another length than the circuit has states.
    #[must_use]
    pub fn new(circuit: &Circuit, inputs: &Inputs, states: &[f64], time: f64) -> Self {
        let mut readings = Readings::default();
        circuit.observe(inputs, states, &mut readings);
        let names = circuit.states().iter().map(|info| info.name.clone());
        Self {
            time,
            states: names.zip(states.iter().copied()).collect(),
            readings,
        }
    }

    /// The moment at `time` (s) of a run, on the straight line between the rows around it; held
    /// before the first and after the last. `None` if the trace has no row.
    #[must_use]
    pub fn of(trace: &Trace, time: f64) -> Option<Self> {
        let table = match trace.steps() {
            steps if steps.is_empty() => trace.grid()?,
            steps => steps,
        };
        let (first, last) = (*table.times().first()?, *table.times().last()?);
        let mut states = Vec::new();
        let mut readings = Readings::default();
        for (position, column) in trace.columns().iter().enumerate() {
            let value = table.column(position).at(time)?;
            match column.signal {
                Some(signal) => readings.put(signal, value),
                None => states.push((column.name.clone(), value)),
            }
        }
        Some(Self {
            time: time.clamp(first, last),
            states,
            readings,
        })
    }

    /// A state by its short name, SI: `p_in`, `x`; `None` if the circuit has none.
    #[must_use]
    pub fn state(&self, name: &str) -> Option<f64> {
        let found = self.states.iter().find(|(state, _)| state == name);
        found.map(|(_, value)| *value)
    }

    /// A signal, SI; `None` if the circuit has none.
    #[must_use]
    pub fn signal(&self, signal: Signal) -> Option<f64> {
        self.readings.has(signal).then(|| self.readings.get(signal))
    }

    /// Travel of the spool, m.
    #[must_use]
    pub fn travel(&self) -> f64 {
        self.state("x").unwrap_or(0.0)
    }
}
