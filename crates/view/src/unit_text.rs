//! Unit symbols as they are printed, with raised exponents.

use helmsplit_scenario::units::Unit;

/// The symbol of a unit for a label: `mm²`, `m³/s`, `°C`, and nothing for a plain number. The
/// plain symbol, as files have it, is [`Unit::symbol`].
#[must_use]
pub fn unit_text(unit: &Unit) -> String {
    if unit.is_bare() {
        return String::new();
    }
    let symbol = match unit.symbol() {
        "deg" => "°".to_owned(),
        other => other.replace("deg", "°"),
    };
    let mut text = String::with_capacity(symbol.len() + 4);
    let mut follows_letter = false;
    for character in symbol.chars() {
        text.push(match character {
            '2' if follows_letter => '²',
            '3' if follows_letter => '³',
            ' ' => '\u{a0}',
            other => other,
        });
        follows_letter = character.is_alphabetic();
    }
    text
}

#[cfg(test)]
mod tests {
    use super::*;
    use helmsplit_scenario::units::all_units;

    #[test]
    fn printed_symbols() {
        for (symbol, printed) in [
            ("bar", "bar"),
            ("L/min", "L/min"),
            ("mm2", "mm²"),
            ("m3/s", "m³/s"),
            ("degC", "°C"),
            ("deg", "°"),
            ("lb ft2", "lb\u{a0}ft²"),
            ("cm3/(min bar)", "cm³/(min\u{a0}bar)"),
            ("1", ""),
            ("%", "%"),
        ] {
            let unit = all_units().iter().find(|unit| unit.symbol() == symbol);
            assert_eq!(unit_text(unit.unwrap()), printed, "{symbol}");
        }
    }

    #[test]
    fn no_printed_symbol_keeps_a_plain_exponent() {
        for unit in all_units() {
            let text = unit_text(unit);
            assert!(
                !text.contains(|c: char| c.is_ascii_digit()),
                "{unit} becomes {text}"
            );
        }
    }
}
