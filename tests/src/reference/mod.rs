//! The reference traces: whole runs of three circuits, computed by an independent implementation
//! of the same equations in another language.
//!
//! It integrated with the implicit Runge-Kutta method Radau IIA of order 5 at a relative
//! tolerance of 1e-9 (Hairer & Wanner, *Solving Ordinary Differential Equations II*, ch. IV.8),
//! from rest without pressure. Each trace comes with its parameters, inputs and typical sizes of
//! the states in SI, as JSON.

pub mod paths;
mod run;

use std::collections::BTreeMap;
use std::path::Path;

use helmsplit_model::Input;
use helmsplit_scenario::Scenario;
use serde::Deserialize;

use crate::trouble::Tried;
pub use run::{Deviation, GRID};

use paths::{CHOICES, COSINES, QUANTITIES, SHARED};

/// The circuits that have a reference.
pub const NAMES: [&str; 3] = [
    "orchard_carrier",
    "c1_small_bench_tank",
    "c3_steer_lock_pilot",
];

/// Input of the reference, the input of the model, the unit it stands in.
const INPUTS: &[(&str, Input, &str)] = &[
    ("n_rpm", Input::EngineSpeed, "rpm"),
    ("w_wheel", Input::WheelRate, "rad/s"),
    ("F_ext", Input::ExternalForce, "N"),
    ("A_st", Input::BenchArea, "m2"),
    ("p_st", Input::BenchPressure, "Pa"),
    ("u_ex", Input::ExcessCommand, ""),
];

/// An input of a reference: one level, or breakpoints of (time in s, value).
#[derive(Debug, Clone, Deserialize)]
#[serde(untagged)]
enum Course {
    Level(f64),
    Points(Vec<(f64, f64)>),
}

/// The JSON beside a trace.
#[derive(Debug, Deserialize)]
struct Header {
    parameters: BTreeMap<String, f64>,
    inputs: BTreeMap<String, Course>,
    t_end: f64,
    scale: BTreeMap<String, f64>,
}

/// One reference.
#[derive(Debug)]
pub struct Reference {
    /// Its name.
    pub name: &'static str,
    header: Header,
    columns: Vec<String>,
    rows: Vec<Vec<f64>>,
}

impl Reference {
    /// Reads a reference from `tests/reference`.
    ///
    /// # Errors
    /// If its files are missing or do not read.
    pub fn load(name: &'static str) -> Tried<Self> {
        let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("reference");
        let header = std::fs::read_to_string(folder.join(format!("{name}.json")))?;
        let mut trace = csv::Reader::from_path(folder.join(format!("{name}.csv")))?;
        let columns = trace.headers()?.iter().map(str::to_owned).collect();
        let rows = trace.deserialize().collect::<Result<Vec<Vec<f64>>, _>>()?;
        Ok(Self {
            name,
            header: serde_json::from_str(&header)?,
            columns,
            rows,
        })
    }

    /// Its parameters by symbol, SI but degrees Celsius and rpm.
    #[must_use]
    pub fn parameters(&self) -> &BTreeMap<String, f64> {
        &self.header.parameters
    }

    /// Typical size of a state by its name.
    #[must_use]
    pub fn scale(&self, state: &str) -> Option<f64> {
        self.header.scale.get(state).copied()
    }

    /// Names of the states.
    pub fn states(&self) -> impl Iterator<Item = &str> {
        self.columns[1..]
            .iter()
            .map(String::as_str)
            .filter(|name| self.scale(name).is_some())
    }

    /// The times of the rows, s.
    pub fn times(&self) -> impl ExactSizeIterator<Item = f64> {
        self.rows.iter().map(|row| row[0])
    }

    /// The values of a column, SI.
    #[must_use]
    pub fn column(&self, name: &str) -> Option<Vec<f64>> {
        let position = self.columns.iter().position(|column| column == name)?;
        Some(self.rows.iter().map(|row| row[position]).collect())
    }

    /// Symbols that no table of [`paths`] knows.
    #[must_use]
    pub fn unknown_symbols(&self) -> Vec<&str> {
        let known = |symbol: &str| {
            QUANTITIES.iter().any(|(name, ..)| *name == symbol)
                || SHARED.iter().any(|(name, _)| *name == symbol)
                || COSINES.iter().any(|(name, _)| *name == symbol)
                || CHOICES.iter().any(|(name, ..)| *name == symbol)
        };
        self.header
            .parameters
            .keys()
            .map(String::as_str)
            .filter(|symbol| !known(symbol))
            .collect()
    }

    /// A scenario with every parameter and input of the reference, each set by its path, that
    /// starts cold.
    ///
    /// # Errors
    /// If a symbol is missing, or the scenario refuses a value.
    pub fn scenario(&self) -> Tried<Scenario> {
        self.scenario_with(&self.header.parameters)
    }

    /// The same with other parameters.
    ///
    /// # Errors
    /// As [`Self::scenario`].
    pub fn scenario_with(&self, parameters: &BTreeMap<String, f64>) -> Tried<Scenario> {
        let value = |symbol: &str| {
            parameters
                .get(symbol)
                .copied()
                .ok_or_else(|| format!("no value for {symbol}"))
        };
        let mut scenario = Scenario::default();
        scenario.set("name", self.name)?;
        scenario.set("start.kind", "cold")?;
        for (symbol, path, unit) in QUANTITIES {
            scenario.set(path, &format!("{} {unit}", value(symbol)?))?;
        }
        scenario.set("excess.motor_fan_speed", "1 rad/s")?;
        for (symbol, ending) in SHARED {
            for path in helmsplit_scenario::paths().filter(|path| path.ends_with(ending)) {
                scenario.set(path, &value(symbol)?.to_string())?;
            }
        }
        for (symbol, path) in COSINES {
            scenario.set(path, &format!("{} rad", value(symbol)?.acos()))?;
        }
        for (symbol, path, options) in CHOICES {
            let option = options
                .get(value(symbol)? as usize)
                .ok_or("no such option")?;
            scenario.set(path, option)?;
        }
        scenario.set("manoeuvre.duration", &format!("{} s", self.header.t_end))?;
        self.drive(&mut scenario)?;
        Ok(scenario)
    }

    fn drive(&self, scenario: &mut Scenario) -> Tried<()> {
        for (name, course) in &self.header.inputs {
            let (_, input, unit) = INPUTS
                .iter()
                .find(|(known, ..)| known == name)
                .ok_or_else(|| format!("input {name} is not known"))?;
            let points = match course {
                Course::Level(level) => vec![(0.0, *level)],
                Course::Points(points) => points.clone(),
            };
            let texts: Vec<(String, String)> = points
                .iter()
                .map(|(t, v)| (format!("{t} s"), format!("{v} {unit}")))
                .collect();
            let texts: Vec<(&str, &str)> = texts
                .iter()
                .map(|(t, v)| (t.as_str(), v.as_str()))
                .collect();
            scenario.manoeuvre.set_free(*input, &texts)?;
        }
        Ok(())
    }
}
