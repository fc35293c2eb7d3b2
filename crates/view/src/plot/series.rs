//! One line of a plot.

use serde::{Deserialize, Serialize};

use crate::style::{Dash, Meaning, kept_pattern};

/// One line: its points, and what it means.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
pub struct Series {
    /// What a person calls it.
    pub label: String,
    /// What it stands for: gives the colour.
    pub meaning: Meaning,
    /// How it is broken.
    pub dash: Dash,
    /// The short name of the state or signal it shows, if it shows one.
    #[serde(default)]
    pub column: Option<String>,
    /// The place of the kept run it belongs to, from 0: drawn thin and pale, behind the others.
    /// `None` for a line of the run itself.
    #[serde(default)]
    pub kept: Option<usize>,
    /// Time (s) and value (in the panel's unit). Times never decrease. A value that is not finite
    /// leaves a gap.
    pub points: Vec<[f64; 2]>,
}

impl Series {
    /// A line with the dash of its meaning.
    #[must_use]
    pub fn new(label: impl Into<String>, meaning: Meaning, points: Vec<[f64; 2]>) -> Self {
        Self {
            label: label.into(),
            meaning,
            dash: meaning.dash(),
            column: None,
            kept: None,
            points,
        }
    }

    /// The same line with another dash.
    #[must_use]
    pub fn dashed(self, dash: Dash) -> Self {
        Self { dash, ..self }
    }

    /// Lengths of line and gap in turn, px: those of its kept run, else those of its dash; empty
    /// for an unbroken line.
    #[must_use]
    pub fn pattern(&self) -> &'static [f64] {
        match self.kept {
            Some(place) => kept_pattern(place),
            None => self.dash.pattern(),
        }
    }

    /// The points that can be drawn.
    pub fn finite(&self) -> impl DoubleEndedIterator<Item = [f64; 2]> + '_ {
        self.points
            .iter()
            .copied()
            .filter(|[time, value]| time.is_finite() && value.is_finite())
    }

    /// Least and largest value; `None` if there is none.
    #[must_use]
    pub fn extent(&self) -> Option<(f64, f64)> {
        extent(self.finite().map(|[_, value]| value))
    }

    /// First and last time with a value; `None` if there is none.
    #[must_use]
    pub fn time_extent(&self) -> Option<(f64, f64)> {
        extent(self.finite().map(|[time, _]| time))
    }
}

/// Least and largest of finite numbers.
pub(crate) fn extent(values: impl Iterator<Item = f64>) -> Option<(f64, f64)> {
    values.fold(None, |so_far, value| match so_far {
        None => Some((value, value)),
        Some((low, high)) => Some((value.min(low), value.max(high))),
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn gaps_do_not_count() {
        let points = vec![
            [0.0, f64::NAN],
            [1.0, 3.0],
            [2.0, f64::INFINITY],
            [3.0, -1.0],
        ];
        let series = Series::new("x", Meaning::Spool, points);
        assert_eq!(series.extent(), Some((-1.0, 3.0)), "finite values only");
        assert_eq!(series.time_extent(), Some((1.0, 3.0)), "finite values only");
        let none = Series::new("x", Meaning::Spool, vec![[0.0, f64::NAN]]);
        assert_eq!(none.extent(), None, "nothing to draw");
    }
}
