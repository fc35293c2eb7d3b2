//! Properties of reading and writing over all units and many sizes.

use helmsplit_model::Quantity;
use proptest::prelude::*;

use super::super::{Digits, parse, text_from_si};
use crate::units::{QUANTITIES, UnitSystem, all_units};

/// Values at both ends and at powers of two, where the intervals are lopsided.
#[test]
fn hard_values_come_back_in_every_unit() {
    let mut values = vec![
        f64::MIN_POSITIVE,
        5e-324,
        1e-310,
        f64::MAX,
        0.1,
        1.0 / 3.0,
        1e22,
        1e23,
    ];
    values.extend((-60..60).map(|power| 2_f64.powi(power)));
    for unit in all_units() {
        for &si in &values {
            if unit.quantity() == Quantity::Count && si.fract() != 0.0 {
                continue;
            }
            let absolute = unit.quantity() == Quantity::Temperature;
            if absolute && si < 1e-18 {
                continue;
            }
            let text = text_from_si(si, unit, Digits::Exact);
            match parse(&text, unit.quantity()) {
                Ok(parsed) => assert_eq!(parsed.si.to_bits(), si.to_bits(), "{text} from {si:e}"),
                Err(error) => panic!("{text} from {si:e}: {error}"),
            }
        }
    }
}

/// Sizes from a thousandth of a micron to a thousand tonnes, spread evenly over the exponents.
fn realistic() -> impl Strategy<Value = f64> {
    (-14_f64..12.0, prop::bool::ANY).prop_map(|(power, negative)| {
        let size = 10_f64.powf(power);
        if negative { -size } else { size }
    })
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(512))]

    #[test]
    fn exact_texts_read_back_to_the_same_bits(si in realistic(), index in 0..all_units().len()) {
        let unit = &all_units()[index];
        let si = match unit.quantity() {
            Quantity::Temperature => si.abs().clamp(1e-9, 2000.0),
            Quantity::Count => si.round(),
            _ => si,
        };
        let text = text_from_si(si, unit, Digits::Exact);
        let back = parse(&text, unit.quantity()).map(|parsed| parsed.si.to_bits());
        prop_assert_eq!(back, Ok(si.to_bits()), "{} from {:e}", text, si);
        // Counted on the mantissa: 17 digits, sign, point and exponent aside.
        let digits = text.split('e').next().map_or(0, |head| {
            let head: String = head.split(' ').next().unwrap_or("").chars().filter(char::is_ascii_digit).collect();
            head.trim_matches('0').len()
        });
        let limit = if unit.quantity() == Quantity::Temperature { 28 } else { 17 };
        prop_assert!(digits <= limit, "{} has {} digits", text, digits);
    }

    #[test]
    fn a_value_survives_a_trip_through_all_unit_systems(si in realistic(), index in 0..QUANTITIES.len()) {
        let quantity = QUANTITIES[index];
        let start = match quantity {
            Quantity::Temperature => si.abs().clamp(1.0, 2000.0),
            Quantity::Count => si.round(),
            _ => si,
        };
        let mut si = start;
        for system in [UnitSystem::Metric, UnitSystem::Us, UnitSystem::Si, UnitSystem::Us, UnitSystem::Metric] {
            let text = text_from_si(si, system.unit(quantity), Digits::Exact);
            si = parse(&text, quantity).map_err(|error| TestCaseError::fail(format!("{text}: {error}")))?.si;
        }
        prop_assert_eq!(si.to_bits(), start.to_bits(), "{:?} {:e}", quantity, start);
    }

    #[test]
    fn a_typed_number_comes_back_as_typed(number in 1_u32..1_000_000, places in 0_u32..5, index in 0..all_units().len()) {
        let unit = &all_units()[index];
        if unit.quantity() == Quantity::Count { return Ok(()); }
        let typed = Decimal { number, places }.to_string();
        let typed = if unit.is_bare() { typed } else { format!("{typed} {unit}") };
        let si = parse(&typed, unit.quantity()).map_err(|error| TestCaseError::fail(format!("{typed}: {error}")))?.si;
        prop_assert_eq!(text_from_si(si, unit, Digits::Exact), typed);
    }

    #[test]
    fn bulk_conversion_stays_within_a_few_roundings(value in realistic(), index in 0..all_units().len()) {
        let unit = &all_units()[index];
        let value = if unit.quantity() == Quantity::Temperature { value.abs().min(2000.0) } else { value };
        let back = unit.value_from_si(unit.si_from_value(value));
        let shift = if unit.quantity() == Quantity::Temperature { 460.0 } else { 0.0 };
        prop_assert!((back - value).abs() <= 4.0 * f64::EPSILON * (value.abs() + shift), "{} {}: {}", value, unit, back);
    }

    #[test]
    fn no_text_makes_the_reader_panic(text in ".{0,120}", index in 0..QUANTITIES.len()) {
        if let Ok(parsed) = parse(&text, QUANTITIES[index]) {
            prop_assert!(parsed.si.is_finite(), "{:?} gave {}", text, parsed.si);
        }
    }

    #[test]
    fn near_misses_do_not_panic_either(text in "[-+−]?[0-9.,eE _/]{1,12}[ a-zA-Z%/²³µ°·0-9()]{0,12}", index in 0..QUANTITIES.len()) {
        if let Ok(parsed) = parse(&text, QUANTITIES[index]) {
            prop_assert!(parsed.si.is_finite(), "{:?} gave {}", text, parsed.si);
        }
    }
}

/// A short decimal as a person would type it: no trailing zeros behind the point.
struct Decimal {
    number: u32,
    places: u32,
}

impl std::fmt::Display for Decimal {
    fn fmt(&self, formatter: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        let power = 10_u32.pow(self.places);
        let (whole, part) = (self.number / power, self.number % power);
        if part == 0 {
            return write!(formatter, "{whole}");
        }
        let part = format!("{part:0>width$}", width = self.places as usize);
        write!(formatter, "{whole}.{}", part.trim_end_matches('0'))
    }
}
