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

/// Raised digits and minus, and what they are.
const RAISED: [(char, char); 11] = [
    ('⁻', MINUS),
    ('⁰', '0'),
    ('¹', '1'),
    ('²', '2'),
    ('³', '3'),
    ('⁴', '4'),
    ('⁵', '5'),
    ('⁶', '6'),
    ('⁷', '7'),
    ('⁸', '8'),
    ('⁹', '9'),
];

/// The letters that the window's font has: the narrow space becomes a no-break space, and a power
/// of ten is written with a caret.
pub(crate) fn on_screen(text: &str) -> String {
    let text = text.replace(NARROW_SPACE, "\u{a0}");
    let mut parts = text.split("×10");
    let mut out = parts.next().unwrap_or_default().to_owned();
    for part in parts {
        out.push_str("×10");
        let plain = |letter: char| RAISED.iter().find(|(raised, _)| *raised == letter);
        let power: String = part
            .chars()
            .map_while(plain)
            .map(|(_, plain)| *plain)
            .collect();
        if !power.is_empty() {
            out.push('^');
            out.push_str(&power);
        }
        out.extend(part.chars().skip(power.chars().count()));
    }
    out
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

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn powers_of_ten_are_written_with_letters_of_the_font() {
        for (text, shown) in [
            (
                "volume closes to 2.9×10⁻⁷ of",
                "volume closes to 2.9×10^−7 of",
            ),
            ("×10⁶ Pa", "×10^6 Pa"),
            ("30 mm²", "30 mm²"),
            ("16\u{202f}219", "16\u{a0}219"),
            ("2×10 m", "2×10 m"),
        ] {
            assert_eq!(on_screen(text), shown, "{text}");
        }
    }
}
