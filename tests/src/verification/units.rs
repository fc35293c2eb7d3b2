//! Identities between units of the trade.

use std::f64::consts::TAU;

use helmsplit_model::Quantity;
use helmsplit_scenario::units::unit;

use crate::check::Tolerance::{Absolute, Relative};
use crate::check::{Check, Source, Subject};

pub(super) const ABOUT: &str = "\
Rules of thumb of the workshop, obtained by converting to SI and back. Some stored pages print
other constants for the torque rule (9543, 9554, 500); 9549.3 is right.";

const TRADE: Subject = Subject {
    title: "Workshop formulas",
    source: Source::published("service literature, metric and US"),
    unit: "",
};

const EXACT: Source = Source::computed("definitions of the units, NIST SP 811, 2008");

/// SI value of a number with a unit; not a number when there is no such unit.
fn si(number: f64, quantity: Quantity, symbol: &str) -> f64 {
    unit(quantity, symbol).map_or(f64::NAN, |unit| unit.si_from_value(number))
}

/// The number in front of a unit that an SI value has.
fn in_unit(si: f64, quantity: Quantity, symbol: &str) -> f64 {
    unit(quantity, symbol).map_or(f64::NAN, |unit| unit.value_from_si(si))
}

/// Power of a flow at a pressure, W.
fn power(flow: (f64, &str), pressure: (f64, &str)) -> f64 {
    si(flow.0, Quantity::Flow, flow.1) * si(pressure.0, Quantity::Pressure, pressure.1)
}

/// Flow of a displacement at a speed in rpm, m3/s.
fn pumped(displacement: (f64, &str), rpm: f64) -> f64 {
    si(displacement.0, Quantity::Displacement, displacement.1)
        * si(rpm, Quantity::AngularVelocity, "rpm")
        / TAU
}

fn power_checks() -> Vec<Check> {
    vec![
        TRADE.in_unit("kW").check(
            "B6.kw",
            "60 L/min at 200 bar",
            20.0,
            Relative(1e-12),
            || {
                in_unit(
                    power((60.0, "L/min"), (200.0, "bar")),
                    Quantity::Power,
                    "kW",
                )
            },
        ),
        TRADE.check("B6.hp", "gpm x psi per hp", 1714.0, Absolute(0.5), || {
            1.0 / in_unit(power((1.0, "gpm"), (1.0, "psi")), Quantity::Power, "hp")
        }),
        TRADE.from(EXACT).check(
            "B6.hp.exact",
            "gpm x psi per hp, exact 33000 x 12 / 231",
            1_714.285_714_286,
            Relative(1e-12),
            || 1.0 / in_unit(power((1.0, "gpm"), (1.0, "psi")), Quantity::Power, "hp"),
        ),
        TRADE.in_unit("hp").check(
            "D2.hp",
            "10.0 gpm at 3000 psi",
            17.50,
            Absolute(5.1e-3),
            || in_unit(power((10.0, "gpm"), (3000.0, "psi")), Quantity::Power, "hp"),
        ),
        TRADE.check(
            "B6.torque.kw",
            "N m x rpm per kW",
            9549.0,
            Absolute(0.5),
            || {
                let watt =
                    si(1.0, Quantity::Torque, "N m") * si(1.0, Quantity::AngularVelocity, "rpm");
                1.0 / in_unit(watt, Quantity::Power, "kW")
            },
        ),
    ]
}

#[allow(clippy::too_many_lines, reason = "a table")]
fn flow_checks() -> Vec<Check> {
    vec![
        TRADE.check(
            "B6.in3",
            "rpm x in3/rev per gpm",
            231.0,
            Relative(1e-12),
            || 1.0 / in_unit(pumped((1.0, "in3/rev"), 1.0), Quantity::Flow, "gpm"),
        ),
        TRADE.check(
            "B6.cm3",
            "rpm x cm3/rev per L/min",
            1000.0,
            Relative(1e-12),
            || 1.0 / in_unit(pumped((1.0, "cm3/rev"), 1.0), Quantity::Flow, "L/min"),
        ),
        TRADE.check(
            "B6.velocity",
            "m/s in a bore of 1 mm per L/min",
            21.22,
            Absolute(5e-3),
            || {
                let area = std::f64::consts::FRAC_PI_4 * si(1.0, Quantity::Length, "mm").powi(2);
                si(1.0, Quantity::Flow, "L/min") / area
            },
        ),
        TRADE.from(EXACT).check(
            "B6.velocity.us",
            "ft/s per gpm and in2, 231 / 720",
            0.320_833_333,
            Relative(1e-8),
            || {
                let speed = si(1.0, Quantity::Flow, "gpm") / si(1.0, Quantity::Area, "in2");
                in_unit(speed, Quantity::Velocity, "ft/s")
            },
        ),
        TRADE.from(EXACT).in_unit("L").check(
            "B6.gallon",
            "1 gal",
            3.785_412,
            Relative(1e-7),
            || in_unit(si(1.0, Quantity::Volume, "gal"), Quantity::Volume, "L"),
        ),
        TRADE.from(EXACT).in_unit("in3").check(
            "B6.gallon.in3",
            "1 gal",
            231.0,
            Relative(1e-12),
            || in_unit(si(1.0, Quantity::Volume, "gal"), Quantity::Volume, "in3"),
        ),
        TRADE.in_unit("cm3/rev").check(
            "D2.displacement",
            "11.69 gpm at 1500 rpm",
            29.501,
            Absolute(5e-4),
            || {
                let turn = si(1500.0, Quantity::AngularVelocity, "rpm") / TAU;
                let displacement = si(11.69, Quantity::Flow, "gpm") / turn;
                in_unit(displacement, Quantity::Displacement, "cm3/rev")
            },
        ),
        TRADE
            .in_unit("gpm")
            .from(Source::published("line sizing chart: 53.9 gpm"))
            .check(
                "F.bore",
                "bore of 1.049 in at 20 ft/s",
                53.9,
                Absolute(0.05),
                || {
                    let bore = si(1.049, Quantity::Length, "in");
                    let area = std::f64::consts::FRAC_PI_4 * bore * bore;
                    in_unit(
                        area * si(20.0, Quantity::Velocity, "ft/s"),
                        Quantity::Flow,
                        "gpm",
                    )
                },
            ),
    ]
}

pub(super) fn checks() -> Vec<Check> {
    let mut all = power_checks();
    all.extend(flow_checks());
    all
}
