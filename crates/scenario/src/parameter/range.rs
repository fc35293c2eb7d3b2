//! Ranges of the parameter table, in the unit of the row's default.

/// Relative error that two conversions of units can leave.
const ROUNDING: f64 = 1e-14;

/// A range of numbers.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Range {
    /// Lower end.
    pub low: f64,
    /// Whether the lower end itself is outside.
    pub low_open: bool,
    /// Upper end, inside.
    pub high: f64,
}

impl Range {
    /// Whether the number lies inside; what is not a number never does. Closed ends give way by
    /// the rounding of a conversion of units, so that `0.36 m` still is within `360 mm`.
    #[must_use]
    pub fn contains(&self, number: f64) -> bool {
        let above = if self.low_open {
            number > self.low
        } else {
            number >= self.low - ROUNDING * self.low.abs()
        };
        above && number <= self.high + ROUNDING * self.high.abs()
    }
}

/// From `low` to `high`, both inside.
pub(crate) const fn within(low: f64, high: f64) -> Range {
    Range {
        low,
        low_open: false,
        high,
    }
}

/// Above `low`, up to `high`.
pub(crate) const fn over(low: f64, high: f64) -> Range {
    Range {
        low,
        low_open: true,
        high,
    }
}

/// The usual range: from `low` to `high`.
pub(crate) const fn usual(low: f64, high: f64) -> Range {
    within(low, high)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn ends_count_as_written() {
        assert!(within(0.0, 1.0).contains(0.0), "closed low end");
        assert!(!over(0.0, 1.0).contains(0.0), "open low end");
        assert!(within(0.0, 1.0).contains(1.0), "high end");
        assert!(!within(0.0, 1.0).contains(1.0 + 1e-12), "beyond");
        assert!(!within(0.0, 1.0).contains(f64::NAN), "not a number");
    }
}
