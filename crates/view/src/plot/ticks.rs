//! Where the numbers on an axis stand: at 1, 2 or 5 times a power of ten.

use super::number::number_text;

/// Numbers this large or larger, or this small or smaller, move a power of 1000 into the unit.
const LARGE: f64 = 1e6;
const SMALL: f64 = 1e-3;

/// Guards the ends of a range against the rounding of its own arithmetic, in steps.
const SLACK: f64 = 1e-6;

/// Steps finer than this share of the values cannot be told apart in `f64`.
const FINEST: f64 = 1e-12;

/// The ticks of one axis.
#[derive(Debug, Clone, PartialEq)]
pub struct Ticks {
    /// Distance between major ticks.
    pub step: f64,
    /// Values of the major ticks, rising.
    pub major: Vec<f64>,
    /// Values of the minor ticks between them, rising.
    pub minor: Vec<f64>,
    /// The labels show the value divided by ten to this power, a multiple of three.
    pub exponent: i32,
    /// Digits behind the point that the labels need.
    pub places: usize,
}

impl Ticks {
    /// Ticks from `low` to `high`, at most about `most` major ones. A range that is empty,
    /// reversed or not finite has none.
    ///
    /// # Examples
    /// ```
    /// use helmsplit_view::plot::Ticks;
    ///
    /// let ticks = Ticks::new(0.0, 165.0, 5);
    /// assert_eq!(ticks.major, [0.0, 50.0, 100.0, 150.0]);
    /// assert_eq!(ticks.label(150.0), "150");
    /// ```
    #[must_use]
    pub fn new(low: f64, high: f64, most: usize) -> Self {
        let span = high - low;
        let largest = low.abs().max(high.abs());
        if !(span.is_finite() && span > largest * FINEST && span >= f64::MIN_POSITIVE * 1e6) {
            return Self::none();
        }
        let Nice { digit, power } = Nice::at_least(span / most.max(1) as f64);
        let subdivisions = if digit == 2 { 4 } else { 5 };
        let multiple = |index: i64, of: i64| Decimal::value(index * digit, of, power);
        let step = multiple(1, 1);
        let first = (low / step - SLACK).ceil() as i64;
        let last = (high / step + SLACK).floor() as i64;
        let minor_step = step / subdivisions as f64;
        let first_minor = (low / minor_step - SLACK).ceil() as i64;
        let last_minor = (high / minor_step + SLACK).floor() as i64;
        let exponent = exponent_for(largest);
        Self {
            step,
            major: (first..=last).map(|index| multiple(index, 1)).collect(),
            minor: (first_minor..=last_minor)
                .filter(|index| index % subdivisions != 0)
                .map(|index| multiple(index, subdivisions))
                .collect(),
            exponent,
            places: usize::try_from(exponent - power).unwrap_or(0),
        }
    }

    fn none() -> Self {
        Self {
            step: f64::NAN,
            major: Vec::new(),
            minor: Vec::new(),
            exponent: 0,
            places: 0,
        }
    }

    /// The text at a tick, without the power of ten.
    #[must_use]
    pub fn label(&self, value: f64) -> String {
        number_text(value * 10_f64.powi(-self.exponent), self.places)
    }

    /// `low` and `high` moved outwards to the nearest minor step.
    #[must_use]
    pub fn widened(low: f64, high: f64, most: usize) -> (f64, f64) {
        let span = high - low;
        if !(span.is_finite() && span > 0.0) {
            return (low, high);
        }
        let Nice { digit, power } = Nice::at_least(span / most.max(1) as f64);
        let subdivisions = if digit == 2 { 4 } else { 5 };
        let step = Decimal::value(digit, subdivisions, power);
        let whole = |index: f64| Decimal::value(index as i64 * digit, subdivisions, power);
        let widened = (
            whole((low / step + SLACK).floor()),
            whole((high / step - SLACK).ceil()),
        );
        if widened.0 <= low && widened.1 >= high {
            widened
        } else {
            (widened.0.min(low), widened.1.max(high))
        }
    }
}

/// `digit` times ten to `power`, with digit 1, 2 or 5.
struct Nice {
    digit: i64,
    power: i32,
}

impl Nice {
    /// The smallest nice number not below `size`, which is positive.
    fn at_least(size: f64) -> Self {
        let power = size.log10().floor() as i32;
        let lead = size / 10_f64.powi(power);
        let (digit, power) = match lead {
            lead if lead <= 1.0 + SLACK => (1, power),
            lead if lead <= 2.0 + SLACK => (2, power),
            lead if lead <= 5.0 + SLACK => (5, power),
            _ => (1, power + 1),
        };
        Self { digit, power }
    }
}

/// Products of whole numbers and powers of ten, rounded once where a double allows it.
struct Decimal;

impl Decimal {
    /// `count / of` times ten to `power`: dividing by whole powers keeps 3 x 0.1 at 0.3.
    fn value(count: i64, of: i64, power: i32) -> f64 {
        if power >= 0 {
            count as f64 * 10_f64.powi(power) / of as f64
        } else {
            // Two divisions where ten to the power alone would overflow.
            let first = power.max(-300);
            count as f64 / (of as f64 * 10_f64.powi(-first)) / 10_f64.powi(first - power)
        }
    }
}

/// The power of 1000 that keeps labels short.
fn exponent_for(largest: f64) -> i32 {
    if !(SMALL..LARGE).contains(&largest) {
        let power = largest.log10() + SLACK;
        3 * (power / 3.0).floor() as i32
    } else {
        0
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use proptest::prelude::*;

    #[test]
    fn steps_are_one_two_five() {
        for (low, high, most, step) in [
            (0.0, 10.0, 10, 1.0),
            (0.0, 10.0, 6, 2.0),
            (0.0, 10.0, 4, 5.0),
            (0.0, 165.0, 5, 50.0),
            (-0.09, 0.09, 5, 0.05),
            (900.0, 2400.0, 4, 500.0),
        ] {
            let ticks = Ticks::new(low, high, most);
            assert!(
                (ticks.step - step).abs() <= 1e-15 * step,
                "{low}..{high}: step {}",
                ticks.step
            );
        }
    }

    #[test]
    fn tick_values_are_the_nearest_doubles() {
        let ticks = Ticks::new(0.0, 1.0, 10);
        let expected = [0.0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 1.0];
        assert_eq!(ticks.major, expected, "no 0.30000000000000004");
        assert_eq!(
            Ticks::new(0.0, 10.0, 5).minor.len(),
            15,
            "three between two"
        );
    }

    #[test]
    fn labels_stay_short() {
        let labels = |low, high, most| -> (Vec<String>, i32) {
            let ticks = Ticks::new(low, high, most);
            let texts = ticks.major.iter().map(|&v| ticks.label(v)).collect();
            (texts, ticks.exponent)
        };
        assert_eq!(
            labels(-100.0, 100.0, 4).0,
            ["−100", "−50", "0", "50", "100"],
            "minus"
        );
        assert_eq!(
            labels(0.0, 0.5, 5).0,
            ["0.0", "0.1", "0.2", "0.3", "0.4", "0.5"],
            "places"
        );
        let (texts, exponent) = labels(0.0, 1.65e7, 4);
        assert_eq!(
            (texts.join(" ").as_str(), exponent),
            ("0 5 10 15", 6),
            "pascals"
        );
        let (texts, exponent) = labels(0.0, 3.5e-4, 4);
        assert_eq!(
            (texts.join(" ").as_str(), exponent),
            ("0 100 200 300", -6),
            "m3/s"
        );
    }

    #[test]
    fn impossible_ranges_have_no_ticks() {
        for (low, high) in [
            (1.0, 1.0),
            (2.0, 1.0),
            (f64::NAN, 1.0),
            (0.0, f64::INFINITY),
            (1e9, 1e9 + 1e-6),
            (-f64::MAX, f64::MAX),
        ] {
            assert!(Ticks::new(low, high, 5).major.is_empty(), "{low}..{high}");
        }
    }

    proptest! {
        #[test]
        fn any_range_has_a_few_ticks_inside(
            low in -1e3..1e3_f64,
            lead in 1.0..10.0_f64,
            power in -9..250_i32,
            most in 2_usize..12,
        ) {
            let span = lead * 10_f64.powi(power);
            let ticks = Ticks::new(low * span, (low + 1.0) * span, most);
            prop_assert!(ticks.major.len() <= most + 1, "{} ticks", ticks.major.len());
            prop_assert!(ticks.major.len() + ticks.minor.len() >= 3, "hardly any tick");
            let rising = ticks.major.windows(2).all(|pair| pair[0] < pair[1]);
            prop_assert!(rising, "out of order");
            let slack = span * 1e-5;
            for &tick in ticks.major.iter().chain(&ticks.minor) {
                prop_assert!(
                    tick >= low * span - slack && tick <= (low + 1.0) * span + slack,
                    "{tick} outside"
                );
            }
            let mut labels: Vec<_> = ticks.major.iter().map(|&v| ticks.label(v)).collect();
            labels.dedup();
            prop_assert_eq!(labels.len(), ticks.major.len(), "two ticks with one label");
        }

        #[test]
        fn widening_never_narrows(low in -1e6..1e6_f64, span in 1e-3..1e6_f64) {
            let (wide_low, wide_high) = Ticks::widened(low, low + span, 5);
            prop_assert!(wide_low <= low && wide_high >= low + span, "narrowed");
            prop_assert!(wide_high - wide_low <= 1.5 * span, "widened without need");
        }
    }
}
