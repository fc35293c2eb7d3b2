//! Tests of both directions, alone and together.

mod properties;
mod refusals;

use helmsplit_model::Quantity;

use super::*;
use crate::units::{QUANTITIES, sample_text, unit, units_of};

fn read(text: &str, wanted: Quantity) -> f64 {
    parse(text, wanted)
        .unwrap_or_else(|error| panic!("{text:?}: {error}"))
        .si
}

#[test]
fn plain_texts_give_the_bits_of_the_literal() {
    use Quantity::*;
    for (text, wanted, si) in [
        ("3.7 mm", Length, 0.0037),
        ("3.7mm", Length, 0.0037),
        ("  3.7   mm ", Length, 0.0037),
        ("+3.7 mm", Length, 0.0037),
        ("3.7e0 mm", Length, 0.0037),
        (".5 m", Length, 0.5),
        ("2. m", Length, 2.0),
        ("-1.5 mm", Length, -0.0015),
        ("−1.5 mm", Length, -0.0015),
        ("175 bar", Pressure, 1.75e7),
        ("15 L/min", Flow, 2.5e-4),
        ("46 mm²/s", KinematicViscosity, 4.6e-5),
        ("46 cSt", KinematicViscosity, 4.6e-5),
        ("50 °C", Temperature, 323.15),
        ("32 degF", Temperature, 273.15),
        ("-459.67 degF", Temperature, 0.0),
        ("0.9", Ratio, 0.9),
        ("0.9 1", Ratio, 0.9),
        ("90 %", Ratio, 0.9),
        ("90%", Ratio, 0.9),
        ("13", Count, 13.0),
        ("13.0", Count, 13.0),
        ("1.5 GPa", BulkModulus, 1.5e9),
        ("20 cm³/rev", Displacement, 2e-5),
        ("30 deg", Angle, std::f64::consts::FRAC_PI_6),
        ("1 in", Length, 0.0254),
        ("1e-3 mm", Length, 1e-6),
        ("0e999999 mm", Length, 0.0),
    ] {
        assert_eq!(
            read(text, wanted).to_bits(),
            f64::to_bits(si),
            "{text:?} as {wanted:?}"
        );
    }
}

#[test]
fn what_was_read_is_kept() {
    let parsed = parse("−3.70mm", Quantity::Length).expect("a length");
    assert_eq!(parsed.number, "-3.70", "the number as written");
    assert_eq!(parsed.unit.symbol(), "mm", "the unit");
}

#[test]
fn every_sample_reads_and_every_unit_is_named() {
    for quantity in QUANTITIES {
        read(sample_text(quantity), quantity);
        for unit in units_of(quantity) {
            for spelling in std::iter::once(&unit.symbol()).chain(unit.aliases()) {
                let parsed = parse(&format!("300 {spelling}"), quantity).expect("an own spelling");
                assert_eq!(parsed.unit, unit, "{spelling:?} as {quantity:?}");
            }
        }
    }
}

#[test]
fn texts_are_as_short_as_they_can_be() {
    use Quantity::*;
    for (text, wanted, symbol) in [
        ("3.7 mm", Length, "mm"),
        ("15 L/min", Flow, "L/min"),
        ("0.145669291 in", Length, "in"),
        ("2538.16 psi", Pressure, "psi"),
        ("122 degF", Temperature, "degF"),
        ("-17.5 degC", Temperature, "degC"),
        ("1800 rpm", AngularVelocity, "rpm"),
        ("33.3 deg", Angle, "deg"),
        ("0.0002 N m s2", FanDrag, "N m s2"),
        ("8e-6 m", Length, "m"),
        ("95 %", Ratio, "%"),
        ("0.95", Ratio, "1"),
        ("13", Count, "1"),
        ("-0 mm", Length, "mm"),
    ] {
        let si = read(text, wanted);
        let unit = unit(wanted, symbol).expect("a unit");
        assert_eq!(text_from_si(si, unit, Digits::Exact), text, "{wanted:?}");
    }
}

#[test]
fn rounded_texts_suit_people() {
    let bar = unit(Quantity::Pressure, "bar").expect("a unit");
    let text = |si, digits| text_from_si(si, bar, digits);
    assert_eq!(
        text(1.754_321e7, Digits::Significant(4)),
        "175.4 bar",
        "four digits"
    );
    assert_eq!(
        text(1.75e7, Digits::Significant(6)),
        "175 bar",
        "no trailing zeros"
    );
    assert_eq!(
        text(1.75e7, Digits::Places(2)),
        "175.00 bar",
        "fixed places"
    );
    assert_eq!(text(f64::NAN, Digits::Exact), "NaN bar", "not a number");
    assert_eq!(
        text(f64::NEG_INFINITY, Digits::Places(1)),
        "-inf bar",
        "infinite"
    );
    assert_eq!(
        number_from_si(1.75e7, bar, Digits::Exact),
        "175",
        "without unit"
    );
}
