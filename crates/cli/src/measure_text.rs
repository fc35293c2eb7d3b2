//! Figures and limits as text.

use helmsplit_model::Quantity;
use helmsplit_scenario::UnitSystem;
use helmsplit_scenario::quantity_text::{Digits, number_from_si, text_from_si};
use helmsplit_study::{Check, CheckId, Limit, Measure};

/// Figures are shown with this many digits: more would claim an accuracy that no model has.
const DIGITS: Digits = Digits::Significant(4);

/// Shares below this are shown as a power of ten, not in per cent.
const SMALL: f64 = 1e-4;

/// A measure with its unit.
pub(crate) fn measure(measure: Measure, units: UnitSystem) -> String {
    if !measure.si.is_finite() {
        return measure.si.to_string();
    }
    match measure.quantity {
        Quantity::Ratio if measure.si.abs() < SMALL => format!("{:.1e}", measure.si),
        quantity => text_from_si(measure.si, units.unit(quantity), DIGITS),
    }
}

/// The figure of a check.
pub(crate) fn figure(check: &Check, units: UnitSystem) -> String {
    check
        .figure
        .map_or_else(String::new, |figure| measure(figure, units))
}

/// The limit of a check, in the unit of its figure.
pub(crate) fn limit(check: &Check, units: UnitSystem) -> String {
    let (Some(limit), Some(figure)) = (check.limit, check.figure) else {
        return String::new();
    };
    let text = |si: f64| text_from_si(si, units.unit(figure.quantity), DIGITS);
    match limit {
        Limit::AtLeast(low) => format!("at least {}", text(low)),
        Limit::AtMost(high) if check.id == CheckId::Audit => format!("at most {high:.0e}"),
        Limit::AtMost(high) => format!("at most {}", text(high)),
        Limit::Inside(low, high) => {
            let low = number_from_si(low, units.unit(figure.quantity), DIGITS);
            format!("{low} to {}", text(high))
        }
    }
}
