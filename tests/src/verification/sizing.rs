//! Sizing: steps of `helmsplit size` against handbook values.

use helmsplit_model::Quantity;
use helmsplit_scenario::Scenario;
use helmsplit_scenario::units::unit;
use helmsplit_study::sizing::{Demand, Load, Scrub, size};

use crate::check::Tolerance::{Absolute, Relative};
use crate::check::{Check, Source, Subject};

pub(super) const ABOUT: &str = "\
Steps of the sizing as `helmsplit size` prints them. Where a row does not say otherwise the circuit
is the default one: cylinder of 25 cm2 x 200 mm, steering unit of 125 cm3/rev, 120 rpm at the wheel.
That every step is what its printed formula gives is tested apart, to 1e-12.";

const SCRUB: Subject = Subject {
    title: "Torque to turn an axle on the spot",
    source: Source::computed("T = W mu sqrt(B^2 / 8 + E^2), sizing pages of a steering-unit maker"),
    unit: "N m",
};

const STEERING: Subject = Subject {
    title: "Steering unit and flow",
    source: Source::published("sizing practice for steering units, 2006"),
    unit: "L/min",
};

const VALVE: Subject = Subject {
    title: "Valve",
    source: Source::computed("F = dp A; Q = Cd a sqrt(2 dp / rho), Merritt 1967"),
    unit: "mm",
};

const LINES: Subject = Subject {
    title: "Lines",
    source: Source::published("line-sizing tables of fluid power handbooks, rounded there"),
    unit: "mm",
};

/// What step `id` gives, SI, for a default circuit changed by `set` and a demand changed by `ask`;
/// not a number where anything fails.
fn step(id: &str, set: &[(&str, &str)], ask: impl Fn(&mut Demand)) -> f64 {
    let mut scenario = Scenario::default();
    for (path, text) in set {
        if scenario.set(path, text).is_err() {
            return f64::NAN;
        }
    }
    let mut demand = Demand {
        standard_sizes: false,
        ..Demand::of(&scenario)
    };
    ask(&mut demand);
    let sizing = size(&scenario, &demand).ok();
    sizing
        .and_then(|sizing| sizing.step(id).map(|step| step.result.si))
        .unwrap_or(f64::NAN)
}

/// Scrub torque, N m.
fn scrub(axle_load: f64, friction: f64, tyre_width: f64, kingpin_offset: f64) -> f64 {
    step("scrub-torque", &[], |demand| {
        demand.load = Load::Scrub(Scrub {
            axle_load,
            friction,
            tyre_width,
            kingpin_offset,
            arm: 0.15,
            driven: false,
        });
    })
}

fn in_unit(si: f64, quantity: Quantity, symbol: &str) -> f64 {
    unit(quantity, symbol).map_or(f64::NAN, |unit| unit.value_from_si(si))
}

fn scrub_checks() -> Vec<Check> {
    let pound_force = 4.448_221_615_260_5;
    let inch = 0.0254;
    let textbook = Source::published("Automotive Chassis Engineering, example 2.1: 594 N m");
    vec![
        SCRUB.check(
            "E4.torque",
            "20 kN, 0.7, tyre 0.25 m, no offset",
            1237.44,
            Absolute(6e-3),
            || scrub(20e3, 0.7, 0.25, 0.0),
        ),
        SCRUB.check(
            "E4.offset",
            "the same with an offset of 0.10 m",
            1868.49,
            Absolute(6e-3),
            || scrub(20e3, 0.7, 0.25, 0.1),
        ),
        SCRUB.in_unit("lbf in").check(
            "E4.us",
            "10 000 lbf, 0.7, tyre 10 in, no offset",
            24_749.0,
            Absolute(0.6),
            move || scrub(1e4 * pound_force, 0.7, 10.0 * inch, 0.0) / (pound_force * inch),
        ),
        SCRUB.from(textbook).check(
            "E4.textbook",
            "1200 kg, 0.58, tyre 250 mm, offset 25 mm; worked there with a lever of \
             sqrt(E^2 + (B / 3)^2), so that both rules differ by 6 %",
            594.0,
            Relative(0.06),
            || scrub(1200.0 * 9.81, 0.58, 0.25, 0.025),
        ),
    ]
}

fn steering_checks() -> Vec<Check> {
    vec![
        STEERING.in_unit("rev").check(
            "E2.sized.turns",
            "turns of 25 cm2 x 200 mm with 125 cm3/rev",
            4.0,
            Relative(1e-9),
            || step("turns", &[], |_| {}),
        ),
        STEERING.in_unit("cm3/rev").check(
            "E2.sized.displacement",
            "displacement for 4 turns",
            125.0,
            Relative(1e-9),
            || step("displacement", &[], |demand| demand.turns = 4.0) * 1e6,
        ),
        STEERING.check(
            "E3.sized.flow",
            "set flow at 120 rpm",
            15.0,
            Relative(1e-9),
            || step("set-flow", &[], |_| {}) * 6e4,
        ),
        STEERING.in_unit("s").check(
            "E3.sized.time",
            "lock to lock at the set flow",
            2.0,
            Relative(1e-9),
            || step("lock-time", &[], |_| {}),
        ),
    ]
}

/// Oil of 848.685 kg/m3 and the spool of 16 mm.
const SMALL: [(&str, &str); 3] = [
    ("oil.density_at_15c", "870 kg/m3"),
    ("oil.temperature", "50 degC"),
    ("valve.spool_diameter", "16 mm"),
];

fn valve_checks() -> Vec<Check> {
    let jets = Source::computed("F = 2 Cd A dp cos 69 deg, Merritt 1967; von Mises 1917");
    let column = Source::computed("one lump of a line: f = c / (2 pi L), c = sqrt(B / rho)");
    vec![
        VALVE.in_unit("mm2").check(
            "C4.sized.area",
            "end of a spool of 16 mm",
            201.062,
            Absolute(5e-4),
            || step("end-area", &SMALL, |_| {}) * 1e6,
        ),
        VALVE.in_unit("N").check(
            "C4.sized.force",
            "spring force for 5.17254 bar on it",
            104.0,
            Absolute(5e-4),
            || {
                step("spring-force", &SMALL, |demand| {
                    demand.spring_drop = 517_254.0;
                })
            },
        ),
        VALVE.check(
            "C5.sized.orifice",
            "orifice for 15 L/min at 5.9683 bar, where 3.7 mm gives 15.0004 L/min",
            3.7,
            Relative(3e-5),
            || {
                step("orifice-turbulent", &SMALL, |demand| {
                    demand.spring_drop = 596_830.0;
                }) * 1e3
            },
        ),
        VALVE.from(jets).in_unit("N").check(
            "C1.sized.jet",
            "jet force of 25.133 mm2 at 50 bar",
            55.842,
            Absolute(2e-3),
            || {
                let at = |id: &str| step(id, &[], |demand| demand.land_drop = 50e5);
                at("jet-free") / at("land-area") * 25.133e-6
            },
        ),
        VALVE.from(column).in_unit("Hz").check(
            "B4.sized.column",
            "2 m of oil at 870 kg/m3 and 1.5 GPa without an end volume; at the pressure of the \
             load the oil is some 0.4 % softer",
            104.49,
            Relative(4e-3),
            || {
                let set = [
                    ("oil.density_at_15c", "870 kg/m3"),
                    ("oil.temperature", "15 degC"),
                    ("oil.entrained_air", "0 %"),
                    ("line.wall_modulus", "1e6 GPa"),
                    ("line.end_volume", "1e-6 cm3"),
                ];
                1.0 / step("column-period", &set, |_| {})
            },
        ),
    ]
}

fn line_checks() -> Vec<Check> {
    // A set flow of 20 L/min: 500 cm3 in 3 turns at 120 rpm.
    let bore = |velocity: &'static str| {
        let set = [("limits.pressure_velocity", velocity)];
        let si = step("priority-bore", &set, |demand| demand.turns = 3.0);
        in_unit(si, Quantity::Length, "mm")
    };
    [("10 m/s", 6.5), ("3 m/s", 11.9)]
        .into_iter()
        .map(|(velocity, expected)| {
            LINES.check(
                format!("F.sized.{}", velocity.replace(' ', "")),
                format!("pressure line for 20 L/min at {velocity}"),
                expected,
                Absolute(0.05),
                move || bore(velocity),
            )
        })
        .collect()
}

pub(super) fn checks() -> Vec<Check> {
    let mut all = scrub_checks();
    all.extend(steering_checks());
    all.extend(valve_checks());
    all.extend(line_checks());
    all
}
