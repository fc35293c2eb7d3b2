//! Numbers as the window prints them.

use helmsplit_model::Quantity;
use helmsplit_scenario::UnitSystem;
use helmsplit_scenario::quantity_text::{Digits, number_from_si};
use helmsplit_scenario::units::Unit;
use helmsplit_study::{Check, CheckId, Limit, Measure};
use helmsplit_view::plot::{MINUS, NARROW_SPACE};
use helmsplit_view::unit_text;

/// Shares below this are shown as a power of ten, not in per cent.
const SMALL: f64 = 1e-4;

/// A real minus.
pub(crate) fn real_minus(text: &str) -> String {
    text.replace('-', &MINUS.to_string())
}

/// The letters that the window's font has: the narrow space becomes a no-break space.
pub(crate) fn on_screen(text: &str) -> String {
    text.replace(NARROW_SPACE, "\u{a0}")
}

/// The symbol of a unit.
pub(crate) fn unit_label(unit: &Unit) -> String {
    match unit_text(unit) {
        micro if micro == "um" => "µm".to_owned(),
        symbol => symbol,
    }
}

/// A number with its unit, at most so many significant digits.
pub(crate) fn with_unit(si: f64, unit: &Unit, digits: u32) -> String {
    let number = real_minus(&number_from_si(si, unit, Digits::Significant(digits)));
    match unit_label(unit) {
        symbol if symbol.is_empty() => number,
        symbol => format!("{number}\u{a0}{symbol}"),
    }
}

/// A measure with its unit.
pub(crate) fn measure(measure: Measure, units: UnitSystem, digits: u32) -> String {
    if !measure.si.is_finite() {
        return measure.si.to_string();
    }
    match measure.quantity {
        Quantity::Ratio if measure.si != 0.0 && measure.si.abs() < SMALL => {
            real_minus(&format!("{:.1e}", measure.si))
        }
        quantity => with_unit(measure.si, units.unit(quantity), digits),
    }
}

/// The limit of a check in words, in the unit of its figure.
pub(crate) fn limit(check: &Check, units: UnitSystem) -> Option<String> {
    let (limit, figure) = (check.limit?, check.figure?);
    let text = |si: f64| measure(Measure::new(si, figure.quantity), units, 4);
    Some(match limit {
        Limit::AtLeast(low) => format!("at least {}", text(low)),
        Limit::AtMost(high) if check.id == CheckId::Audit => {
            format!("at most {}", real_minus(&format!("{high:.0e}")))
        }
        Limit::AtMost(high) => format!("at most {}", text(high)),
        Limit::Inside(low, high) => format!("{} to {}", text(low), text(high)),
    })
}

/// The name of a check as words.
pub(crate) fn check_name(id: CheckId) -> String {
    id.name().replace('-', " ")
}
