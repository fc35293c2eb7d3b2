//! From a value to a place on paper.

use super::ticks::Ticks;

/// One number on an axis says where, two say how much.
const LEAST_TICKS: usize = 2;

/// One axis: a range of values laid over a stretch of pixels.
#[derive(Debug, Clone, PartialEq)]
pub struct Axis {
    /// Value at `start`.
    pub low: f64,
    /// Value at `end`.
    pub high: f64,
    /// Where `low` lies, px.
    pub start: f64,
    /// Where `high` lies, px; below `start` for an axis that points up.
    pub end: f64,
    /// Its ticks.
    pub ticks: Ticks,
}

impl Axis {
    /// An axis for `range`, with major ticks about `spacing` px apart, closer only where there
    /// would be a single one.
    #[must_use]
    pub fn new(range: (f64, f64), (start, end): (f64, f64), spacing: f64) -> Self {
        let (low, high) = range;
        let most = most_ticks((end - start).abs(), spacing);
        let mut ticks = Ticks::new(low, high, most);
        for more in most + 1..=most * 2 {
            if ticks.major.len() >= LEAST_TICKS {
                break;
            }
            ticks = Ticks::new(low, high, more);
        }
        Self {
            low,
            high,
            start,
            end,
            ticks,
        }
    }

    /// Where a value lies, px.
    #[must_use]
    pub fn position(&self, value: f64) -> f64 {
        let share = (value - self.low) / (self.high - self.low);
        self.start + share * (self.end - self.start)
    }

    /// Whether a value lies on the axis.
    #[must_use]
    pub fn contains(&self, value: f64) -> bool {
        value >= self.low && value <= self.high
    }
}

/// How many ticks fit.
pub(crate) fn most_ticks(length: f64, spacing: f64) -> usize {
    (length / spacing).round().clamp(2.0, 100.0) as usize
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn positions_are_linear_and_may_point_up() {
        let axis = Axis::new((0.0, 200.0), (120.0, 20.0), 25.0);
        for (value, px) in [(0.0, 120.0), (50.0, 95.0), (200.0, 20.0)] {
            assert!((axis.position(value) - px).abs() < 1e-12, "{value}");
        }
        assert_eq!(
            axis.ticks.major,
            [0.0, 50.0, 100.0, 150.0, 200.0],
            "four steps fit"
        );
        let flat = Axis::new((-34.0, 34.0), (60.0, 0.0), 20.0);
        assert_eq!(flat.ticks.major, [-20.0, 0.0, 20.0], "not a single tick");
        assert!(
            axis.contains(200.0) && !axis.contains(200.1),
            "ends belong to it"
        );
    }
}
