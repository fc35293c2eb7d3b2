//! Circuits and operating points for tests of equilibria.

use helmsplit_scenario::{Preset, Scenario};
use helmsplit_study::{OperatingPoint, SteeringDuty};

/// L/min in 1 m3/s.
pub const LPM: f64 = 6e4;

/// rad/s in 1 rpm.
pub const RPM: f64 = std::f64::consts::PI / 30.0;

/// A circuit that comes with the program.
///
/// # Panics
/// If there is no such circuit; the program's own tests hold that those that come with it read.
#[must_use]
pub fn preset(key: &str) -> Scenario {
    Preset::from_key(key)
        .and_then(|preset| preset.scenario().ok())
        .unwrap_or_else(|| panic!("no circuit {key}"))
}

/// The orchard carrier with throttles into given pressures on both ports, that on the excess port
/// of 150 mm2: pressure sources in all but name.
///
/// # Panics
/// If the circuit refuses one of these choices.
#[must_use]
pub fn bench() -> Scenario {
    let mut scenario = preset("orchard_carrier");
    for (path, value) in [
        ("steering.kind", "bench throttle"),
        ("excess.kind", "bench throttle"),
        ("excess.outlet_area", "150 mm2"),
    ] {
        if let Err(finding) = scenario.set(path, value) {
            panic!("{finding}");
        }
    }
    scenario
}

/// The bench at an engine speed (rpm) and pressures (bar) behind both ports, the throttle of the
/// priority port of 300 mm2.
///
/// # Panics
/// As [`fn@bench`].
#[must_use]
pub fn bench_point(speed_rpm: f64, steering_bar: f64, excess_bar: f64) -> OperatingPoint {
    OperatingPoint::resting(&bench())
        .at_speed(speed_rpm * RPM)
        .steering(SteeringDuty::Bench {
            pressure: steering_bar * 1e5,
            area: 300e-6,
        })
        .excess_pressure(excess_bar * 1e5)
}
