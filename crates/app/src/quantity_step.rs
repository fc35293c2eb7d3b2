//! How far one press of an arrow key moves a value.

use helmsplit_model::Quantity;
use helmsplit_scenario::Parameter;
use helmsplit_scenario::units::Unit;

/// Steps across the usual range, about.
const STEPS: f64 = 100.0;

/// A round step, about a hundredth of the usual range, in the display unit.
pub(crate) fn step_of(row: &Parameter, unit: &Unit) -> f64 {
    let span = row
        .unit()
        .si_from_difference(row.usual.high - row.usual.low);
    let raw = (span / unit.si_from_difference(1.0) / STEPS).abs();
    if row.quantity == Quantity::Count {
        return 1.0;
    }
    if !(raw.is_finite() && raw > 0.0) {
        return 1.0;
    }
    let decade = 10f64.powf(raw.log10().floor());
    let lead = raw / decade;
    let round = if lead < 1.5 {
        1.0
    } else if lead < 3.5 {
        2.0
    } else if lead < 7.5 {
        5.0
    } else {
        10.0
    };
    round * decade
}

#[cfg(test)]
mod tests {
    use super::*;
    use helmsplit_scenario::convert::display_unit;
    use helmsplit_scenario::{UnitSystem, parameters};

    #[test]
    fn steps_are_round_and_fit_the_usual_range() {
        for row in parameters() {
            for units in UnitSystem::ALL {
                let unit = display_unit(row, units);
                let step = step_of(row, unit);
                let span = row
                    .unit()
                    .si_from_difference(row.usual.high - row.usual.low);
                let count = span / unit.si_from_difference(step);
                let counted = row.quantity == Quantity::Count;
                assert!(
                    counted || (40.0..=200.0).contains(&count),
                    "{}: {count} steps of {step} {unit}",
                    row.path
                );
            }
        }
    }
}
