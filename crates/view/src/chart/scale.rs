//! Linear and logarithmic axes placed on paper.

use serde::{Deserialize, Serialize};

use crate::plot::{Axis, number_text, power_text};

/// How values are spread along an axis.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Serialize, Deserialize)]
pub enum ScaleKind {
    /// Evenly.
    Linear,
    /// By their logarithm; values from 0 down are not shown.
    Logarithmic,
}

/// Room beyond the data, as a share of their span.
const ROOM: f64 = 0.05;

/// A constant is shown with this share of its size on both sides.
const ROOM_AROUND_CONSTANT: f64 = 0.1;

/// The range of an axis over its data; `tight` leaves no room.
pub(super) fn range_of(values: &[f64], kind: ScaleKind, tight: bool) -> Option<(f64, f64)> {
    let shown = values
        .iter()
        .copied()
        .filter(|v| v.is_finite() && (kind == ScaleKind::Linear || *v > 0.0));
    let (low, high) = shown.fold((f64::INFINITY, f64::NEG_INFINITY), |(low, high), v| {
        (low.min(v), high.max(v))
    });
    if low > high {
        return None;
    }
    match kind {
        ScaleKind::Linear => {
            let span = high - low;
            let size = low.abs().max(high.abs());
            if span <= size * 1e-9 {
                let room = if size > 0.0 {
                    ROOM_AROUND_CONSTANT * size
                } else {
                    1.0
                };
                return Some((low - room, high + room));
            }
            let room = if tight { 0.0 } else { ROOM * span };
            Some((low - room, high + room))
        }
        ScaleKind::Logarithmic => {
            let room = if tight || high / low < 1.0 + 1e-9 {
                1.0
            } else {
                (high / low).powf(ROOM)
            };
            let (low, high) = (low / room, high * room);
            if high / low < 1.0 + 1e-6 {
                Some((low / 2.0, high * 2.0))
            } else {
                Some((low, high))
            }
        }
    }
}

/// An axis on paper: from values to places, with its ticks.
#[derive(Debug, Clone, PartialEq)]
pub enum PlacedScale {
    /// Evenly spread.
    Linear(Axis),
    /// Spread by the logarithm.
    Logarithmic {
        /// First and last value.
        range: (f64, f64),
        /// Their places, px.
        ends: (f64, f64),
    },
}

impl PlacedScale {
    /// An axis over `range` from one place to another, px, with linear ticks at least `spacing` px
    /// apart.
    #[must_use]
    pub fn new(kind: ScaleKind, range: (f64, f64), ends: (f64, f64), spacing: f64) -> Self {
        match kind {
            ScaleKind::Linear => Self::Linear(Axis::new(range, ends, spacing)),
            ScaleKind::Logarithmic => Self::Logarithmic { range, ends },
        }
    }

    /// The place of a value, px; not a number where the axis has none.
    #[must_use]
    pub fn position(&self, value: f64) -> f64 {
        match self {
            Self::Linear(axis) => axis.position(value),
            Self::Logarithmic { range, ends } => {
                if value <= 0.0 {
                    return f64::NAN;
                }
                let share = (value / range.0).ln() / (range.1 / range.0).ln();
                ends.0 + share * (ends.1 - ends.0)
            }
        }
    }

    /// First and last value.
    #[must_use]
    pub fn range(&self) -> (f64, f64) {
        match self {
            Self::Linear(axis) => (axis.low, axis.high),
            Self::Logarithmic { range, .. } => *range,
        }
    }

    /// Whether a value lies on the axis.
    #[must_use]
    pub fn contains(&self, value: f64) -> bool {
        let (low, high) = self.range();
        value >= low && value <= high
    }

    /// Power of ten that the ticks leave out; 0 for none.
    #[must_use]
    pub fn exponent(&self) -> i32 {
        match self {
            Self::Linear(axis) => axis.ticks.exponent,
            Self::Logarithmic { .. } => 0,
        }
    }

    /// Ticks with their numbers, and ticks without.
    #[must_use]
    pub fn ticks(&self) -> (Vec<(f64, String)>, Vec<f64>) {
        match self {
            Self::Linear(axis) => {
                let major = axis.ticks.major.iter();
                let named = major.map(|&tick| (tick, axis.ticks.label(tick))).collect();
                (named, axis.ticks.minor.clone())
            }
            Self::Logarithmic { range, .. } => logarithmic_ticks(*range),
        }
    }
}

/// Decades carry numbers; within up to two decades 2 and 5 do as well.
fn logarithmic_ticks((low, high): (f64, f64)) -> (Vec<(f64, String)>, Vec<f64>) {
    let decades = (high / low).log10();
    let numbered: &[u8] = if decades <= 2.5 { &[1, 2, 5] } else { &[1] };
    let every = (decades / 8.0).ceil().max(1.0) as i32;
    let (mut major, mut minor) = (Vec::new(), Vec::new());
    let slack = 1.0 + 1e-9;
    for power in low.log10().floor() as i32..=high.log10().ceil() as i32 {
        for digit in 1..=9_u8 {
            let value = f64::from(digit) * 10_f64.powi(power);
            if value * slack < low || value > high * slack {
                continue;
            }
            if numbered.contains(&digit) && power % every == 0 {
                major.push((value, logarithmic_label(value, power)));
            } else {
                minor.push(value);
            }
        }
    }
    (major, minor)
}

fn logarithmic_label(value: f64, power: i32) -> String {
    match power {
        -3..=4 => number_text(value, usize::try_from(-power).unwrap_or(0)),
        _ => power_text(value),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn decades_are_evenly_spread() {
        let scale = PlacedScale::new(ScaleKind::Logarithmic, (1.0, 1000.0), (10.0, 310.0), 20.0);
        for (value, px) in [(1.0, 10.0), (10.0, 110.0), (1000.0, 310.0)] {
            assert!((scale.position(value) - px).abs() < 1e-9, "{value}");
        }
        assert!(scale.position(0.0).is_nan(), "no place for 0");
        let (major, minor) = scale.ticks();
        let labels: Vec<&str> = major.iter().map(|(_, text)| text.as_str()).collect();
        assert_eq!(labels, ["1", "10", "100", "1000"], "decades");
        assert_eq!(minor.len(), 24, "2 to 9 in three decades");
    }

    #[test]
    fn short_axes_number_two_and_five() {
        let (major, _) = logarithmic_ticks((0.15, 6.0));
        let labels: Vec<&str> = major.iter().map(|(_, text)| text.as_str()).collect();
        assert_eq!(labels, ["0.2", "0.5", "1", "2", "5"], "one, two, five");
    }

    #[test]
    fn ranges_leave_room_and_survive_constants() {
        assert_eq!(range_of(&[], ScaleKind::Linear, false), None, "nothing");
        let (low, high) = range_of(&[3.0, 3.0], ScaleKind::Linear, false).unwrap();
        assert!(low < 3.0 && high > 3.0, "{low}..{high}");
        let (low, high) = range_of(&[0.0, 10.0, 1000.0], ScaleKind::Logarithmic, false).unwrap();
        assert!(low > 0.0 && low < 10.0 && high > 1000.0, "{low}..{high}");
    }
}
