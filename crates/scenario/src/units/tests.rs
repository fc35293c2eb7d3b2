//! Tests of the whole table: completeness, spellings, and the factors against published ones.

use std::collections::BTreeSet;

use helmsplit_model::Quantity;

use super::*;

fn factor(quantity: Quantity, text: &str) -> f64 {
    unit(quantity, text)
        .unwrap_or_else(|| panic!("{text} must be a unit"))
        .factor
}

#[test]
fn no_row_is_lost_and_each_quantity_has_its_si_unit_first() {
    assert_eq!(
        all_units().len(),
        table::DEFINITIONS.len(),
        "every row must resolve"
    );
    for quantity in QUANTITIES {
        let si = si_unit(quantity);
        assert_eq!(si.symbol(), quantity.si_symbol(), "{quantity:?}");
        assert_eq!(
            si.factor.to_bits(),
            1.0_f64.to_bits(),
            "{quantity:?} in SI has factor 1"
        );
        assert_eq!(
            si.shift.to_bits(),
            0.0_f64.to_bits(),
            "{quantity:?} in SI has no shift"
        );
    }
}

#[test]
fn spellings_are_unique_within_a_quantity_and_already_plain() {
    for quantity in QUANTITIES {
        let mut seen = BTreeSet::new();
        for unit in units_of(quantity) {
            for spelling in std::iter::once(&unit.symbol).chain(unit.aliases) {
                assert!(
                    seen.insert(*spelling),
                    "{spelling:?} twice for {quantity:?}"
                );
                assert_eq!(
                    plain_spelling(spelling),
                    **spelling,
                    "{spelling:?} must be plain"
                );
            }
        }
    }
}

/// The digits are the ones the publication prints, so half a unit in the last is allowed.
/// Source: NIST Special Publication 811 (2008), Appendix B.8.
#[test]
#[allow(clippy::too_many_lines, reason = "a table")]
fn factors_agree_with_the_published_ones() {
    use Quantity::*;
    for (quantity, text, published, last_digit) in [
        (Pressure, "psi", 6.894_757e3, 1e-3),
        (Flow, "gpm", 6.309_020e-5, 1e-11),
        (Volume, "gal", 3.785_412e-3, 1e-9),
        (Power, "hp", 7.456_999e2, 1e-4),
        (Torque, "lbf ft", 1.355_818, 1e-6),
        (Torque, "lbf in", 1.129_848e-1, 1e-7),
        (Density, "lb/ft3", 1.601_846e1, 1e-5),
        (Force, "lbf", 4.448_221_615_260_5, 1e-15),
        (Mass, "lb", 0.453_592_37, 1e-17),
        // Further rows of the same appendix: value from memory.
        (SpringRate, "lbf/in", 1.751_268e2, 1e-4),
        (Volume, "in3", 1.638_706e-5, 1e-11),
        (Area, "in2", 6.4516e-4, 1e-19),
        (AngularVelocity, "rpm", 1.047_198e-1, 1e-7),
        (Angle, "deg", 1.745_329e-2, 1e-8),
        (Inertia, "lb ft2", 4.214_011e-2, 1e-8),
        (Inertia, "lb in2", 2.926_397e-4, 1e-10),
        (Mass, "oz", 2.834_952e-2, 1e-8),
        (Velocity, "km/h", 2.777_778e-1, 1e-7),
    ] {
        let got = factor(quantity, text);
        let off = (got - published).abs();
        assert!(
            off <= 0.5 * last_digit * (1.0 + 1e-9),
            "{text}: {got:e} against {published:e}"
        );
    }
}

/// Trade identities with known exact values: a pump of 1 in3 at 231 rpm gives 1 gpm; 1 hp is
/// 33 000 ft lbf/min, so gpm times psi over 1 hp is 33 000 * 12 / 231.
#[test]
fn trade_identities_hold() {
    use Quantity::*;
    let one_turn = 2.0 * std::f64::consts::PI;
    let flow = factor(Displacement, "in3/rev") * 231.0 * factor(AngularVelocity, "rpm") / one_turn;
    assert!(
        (flow / factor(Flow, "gpm") - 1.0).abs() < 1e-15,
        "231 in3 per minute is 1 gpm"
    );
    let ratio = factor(Power, "hp") / (factor(Flow, "gpm") * factor(Pressure, "psi"));
    assert!(
        (ratio / (33_000.0 * 12.0 / 231.0) - 1.0).abs() < 1e-15,
        "hp = gpm psi / 1714.29"
    );
    let kilowatt = factor(Flow, "L/min") * 600.0 * factor(Pressure, "bar");
    assert!(
        (kilowatt / 1000.0 - 1.0).abs() < 1e-15,
        "kW = L/min bar / 600"
    );
    let leak = factor(LeakageCoefficient, "gpm/psi") * factor(Pressure, "psi");
    assert!(
        (leak / factor(Flow, "gpm") - 1.0).abs() < 1e-15,
        "leakage times pressure is flow"
    );
    let leak = factor(LeakageCoefficient, "in3/(min psi)") * factor(Pressure, "psi") * 60.0;
    assert!(
        (leak / factor(Volume, "in3") - 1.0).abs() < 1e-15,
        "leakage times pressure is flow"
    );
    let gallon = 231.0 * factor(Volume, "in3");
    assert!(
        (gallon / factor(Volume, "gal") - 1.0).abs() < 1e-15,
        "a gallon is 231 in3"
    );
}

#[test]
fn typed_spellings_find_their_unit() {
    use Quantity::*;
    for (quantity, typed, symbol) in [
        (Flow, "l/min", "L/min"),
        (Flow, "lpm", "L/min"),
        (Length, "µm", "um"),
        (Length, "μm", "um"),
        (Temperature, "°C", "degC"),
        (Temperature, "° C", "degC"),
        (Temperature, "°F", "degF"),
        (Area, "mm^2", "mm2"),
        (Area, "mm²", "mm2"),
        (Displacement, "cc/rev", "cm3/rev"),
        (Displacement, "cm³/rev", "cm3/rev"),
        (AngularVelocity, "r/min", "rpm"),
        (AngularVelocity, "turns/s", "turns/s"),
        (Flow, "m³/s", "m3/s"),
        (Torque, "Nm", "N m"),
        (Torque, "N·m", "N m"),
        (Torque, "lbf·in", "lbf in"),
        (Torque, "lbf-ft", "lbf ft"),
        (LeakageCoefficient, "cm³/(min·bar)", "cm3/(min bar)"),
        (Damping, "N·s/m", "N s/m"),
        (FanDrag, "N·m·s²", "N m s2"),
        (Ratio, "", "1"),
        (Ratio, "%", "%"),
    ] {
        let found = unit(quantity, typed).map(Unit::symbol);
        assert_eq!(found, Some(symbol), "{typed:?} as {quantity:?}");
    }
    for (quantity, typed) in [
        (Pressure, "mPa"),
        (Pressure, "mpa"),
        (Length, "Mm"),
        (Length, "bar"),
        (Length, ""),
    ] {
        assert_eq!(
            unit(quantity, typed).map(Unit::symbol),
            None,
            "{typed:?} is no {quantity:?}"
        );
    }
}

#[test]
fn bulk_conversion_agrees_with_known_values() {
    let check = |quantity, text: &str, value: f64, si: f64| {
        let unit = unit(quantity, text).expect("a unit");
        assert_eq!(
            unit.si_from_value(value).to_bits(),
            si.to_bits(),
            "{value} {text}"
        );
        let back = unit.value_from_si(si);
        assert!(
            (back - value).abs() <= 4.0 * f64::EPSILON * value.abs(),
            "{si} in {text}: {back}"
        );
    };
    check(Quantity::Length, "mm", 3.7, 0.0037);
    check(Quantity::Length, "um", 8.0, 8e-6);
    check(Quantity::Pressure, "bar", 175.0, 1.75e7);
    check(Quantity::Flow, "L/min", 15.0, 0.00025);
    check(Quantity::Temperature, "degC", 50.0, 323.15);
    check(Quantity::Angle, "deg", 180.0, std::f64::consts::PI);
    let fahrenheit = unit(Quantity::Temperature, "degF").expect("a unit");
    assert!(
        (fahrenheit.si_from_value(212.0) - 373.15).abs() < 1e-12,
        "water boils at 212 degF"
    );
    assert!(
        (fahrenheit.si_from_difference(9.0) - 5.0).abs() < 1e-15,
        "9 degF are 5 K apart"
    );
}
