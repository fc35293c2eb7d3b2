//! From a place on the screen to a round number.

use helmsplit_scenario::units::Unit;

/// Round steps are about so many points apart.
const COARSE: f64 = 6.0;

/// Steps without snapping: finer than anybody sees, coarse enough for short numbers.
const FINE: f64 = 0.2;

/// Steps in which a number moves on an axis.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) struct Steps {
    step: f64,
}

impl Steps {
    /// Steps for an axis on which `span` lies over `length` points: round ones with `snap`.
    pub(crate) fn new(span: f64, length: f32, snap: bool) -> Self {
        let apart = if snap { COARSE } else { FINE };
        let raw = span / f64::from(length.max(1.0)) * apart;
        Self { step: round(raw) }
    }

    /// One step.
    pub(crate) fn size(self) -> f64 {
        self.step
    }

    /// The text of the step nearest to a number, such as `2.2 s`.
    pub(crate) fn text(self, number: f64, unit: &Unit) -> String {
        let rounded = (number / self.step).round() * self.step;
        let places = (-self.step.log10().floor()).clamp(0.0, 12.0) as usize;
        let text = format!("{rounded:.places$}");
        // The shortest text: `2 s`, not `2.0 s`; and no zero below zero.
        let text = if text.contains('.') {
            text.trim_end_matches('0').trim_end_matches('.')
        } else {
            &text
        };
        let text = if text == "-0" { "0" } else { text };
        if unit.is_bare() {
            text.to_owned()
        } else {
            format!("{text} {unit}")
        }
    }
}

/// The next of 1, 2 and 5 times a power of ten that is not smaller.
fn round(raw: f64) -> f64 {
    if !(raw.is_finite() && raw > 0.0) {
        return 1.0;
    }
    let decade = 10f64.powf(raw.log10().floor());
    let lead = raw / decade;
    let digits = [1.0, 2.0, 5.0, 10.0];
    let digit = digits.into_iter().find(|digit| lead <= digit + 1e-9);
    digit.unwrap_or(10.0) * decade
}

#[cfg(test)]
mod tests {
    use super::*;
    use helmsplit_model::Quantity;
    use helmsplit_scenario::units::unit;

    #[test]
    fn steps_are_round_and_texts_short() {
        let second = unit(Quantity::Time, "s").unwrap();
        let steps = Steps::new(10.0, 600.0, true);
        assert!((steps.size() - 0.1).abs() < 1e-12, "{}", steps.size());
        for (number, text) in [
            (2.234, "2.2 s"),
            (1.96, "2 s"),
            (-0.04, "0 s"),
            (30.0, "30 s"),
        ] {
            assert_eq!(steps.text(number, second), text, "{number}");
        }
        let rpm = unit(Quantity::AngularVelocity, "rpm").unwrap();
        let steps = Steps::new(2500.0, 100.0, true);
        assert_eq!(steps.text(1730.0, rpm), "1800 rpm", "steps of 200");
        let fine = Steps::new(10.0, 600.0, false);
        assert_eq!(fine.text(2.2341, second), "2.235 s", "steps of 5 ms");
        let command = unit(Quantity::Ratio, "1").unwrap();
        let steps = Steps::new(2.0, 100.0, true);
        assert_eq!(steps.text(-0.31, command), "-0.4", "no unit, steps of 0.2");
    }
}
