//! The range of one parameter, with an even scale from 0 to 1.

use helmsplit_model::Quantity;
use helmsplit_scenario::ParameterId;

/// Range from which on a parameter is scanned in equal ratios instead of equal steps.
const WIDE: f64 = 4.0;

/// A parameter between two values, scaled 0 to 1.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) struct ParameterScale {
    from: f64,
    to: f64,
    ratio: bool,
    whole: bool,
}

impl ParameterScale {
    /// From `from` to `to`, SI, `from` below `to`. Counts are whole numbers.
    pub(crate) fn new(id: ParameterId, from: f64, to: f64) -> Self {
        Self {
            from,
            to,
            ratio: from > 0.0 && to > WIDE * from,
            whole: id.parameter().quantity == Quantity::Count,
        }
    }

    /// The value at a share of the scale, SI.
    pub(crate) fn at(&self, share: f64) -> f64 {
        if share <= 0.0 {
            return self.from;
        }
        if share >= 1.0 {
            return self.to;
        }
        let value = if self.ratio {
            self.from * (self.to / self.from).powf(share)
        } else {
            self.from + (self.to - self.from) * share
        };
        if self.whole { value.round() } else { value }
    }

    /// Whether only whole numbers count.
    pub(crate) fn is_whole(&self) -> bool {
        self.whole
    }

    /// `count` values with their shares, both ends among them; whole numbers come once each.
    pub(crate) fn points(&self, count: usize) -> Vec<(f64, f64)> {
        let last = count.max(2) - 1;
        let mut points: Vec<(f64, f64)> = (0..=last)
            .map(|i| i as f64 / last as f64)
            .map(|share| (share, self.at(share)))
            .collect();
        points.dedup_by(|a, b| a.1.to_bits() == b.1.to_bits());
        points
    }
}

/// The usual range of a parameter, SI. Where its low end is 0 and not allowed, a thousandth of the
/// high end stands in.
pub(crate) fn usual_range(id: ParameterId) -> (f64, f64) {
    let row = id.parameter();
    let (low, high) = (row.usual.low, row.usual.high);
    let low = if row.allowed.contains(low) {
        low
    } else {
        high * 1e-3
    };
    (
        row.unit().si_from_value(low),
        row.unit().si_from_value(high),
    )
}

/// Whether a value (SI) is allowed for a parameter.
pub(crate) fn is_allowed(id: ParameterId, si: f64) -> bool {
    let row = id.parameter();
    row.allowed.contains(row.unit().value_from_si(si))
}

#[cfg(test)]
mod tests {
    use super::*;
    use helmsplit_scenario::parameter::{oil, pump, valve_edges};
    use helmsplit_scenario::parameters;

    #[test]
    fn usual_ranges_are_allowed() {
        for row in parameters() {
            let (low, high) = usual_range(row.id);
            assert!(low <= high, "{}", row.path);
            assert!(is_allowed(row.id, low), "{}", row.path);
            assert!(is_allowed(row.id, high), "{}", row.path);
        }
    }

    #[test]
    fn scales_are_even() {
        let hole = ParameterScale::new(valve_edges::DISC_HOLE_DIAMETER, 0.3e-3, 2e-3);
        assert!(
            (hole.at(0.5) - (0.3e-3 * 2e-3_f64).sqrt()).abs() < 1e-15,
            "ratios"
        );
        let warm = ParameterScale::new(oil::TEMPERATURE, 280.0, 360.0);
        assert!((warm.at(0.5) - 320.0).abs() < 1e-12, "steps");
        let teeth = ParameterScale::new(pump::TEETH, 8.0, 12.0);
        let counts: Vec<f64> = teeth.points(25).into_iter().map(|p| p.1).collect();
        assert_eq!(
            counts,
            [8.0, 9.0, 10.0, 11.0, 12.0],
            "whole numbers, once each"
        );
    }
}
