//! Least and largest values over a run.

use serde::Serialize;

/// Least and largest value of one column, SI, and when they first occurred, s.
#[derive(Debug, Clone, Copy, PartialEq, Serialize)]
pub struct Extreme {
    /// Least value.
    pub min: f64,
    /// When.
    pub min_time: f64,
    /// Largest value.
    pub max: f64,
    /// When.
    pub max_time: f64,
}

/// Extremes of all columns, kept while a run goes on.
#[derive(Debug, Clone, PartialEq)]
pub(crate) struct Extremes {
    columns: Vec<Extreme>,
}

impl Extremes {
    pub(crate) fn new(width: usize) -> Self {
        let none = Extreme {
            min: f64::INFINITY,
            min_time: f64::NAN,
            max: f64::NEG_INFINITY,
            max_time: f64::NAN,
        };
        Self {
            columns: vec![none; width],
        }
    }

    pub(crate) fn push(&mut self, time: f64, row: &[f64]) {
        for (column, &value) in self.columns.iter_mut().zip(row) {
            if value < column.min {
                column.min = value;
                column.min_time = time;
            }
            if value > column.max {
                column.max = value;
                column.max_time = time;
            }
        }
    }

    pub(crate) fn get(&self, position: usize) -> Option<Extreme> {
        let extreme = self.columns[position];
        (extreme.min <= extreme.max).then_some(extreme)
    }
}
