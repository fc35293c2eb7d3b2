//! The manoeuvre of the orchard carrier (docs/model.md, M13).

use std::f64::consts::TAU;

use helmsplit_model::{Input, InputProfiles, Profile};

pub(crate) fn rad_per_s(rpm: f64) -> f64 {
    rpm * TAU / 60.0
}

fn speed(points_rpm: &[(f64, f64)]) -> Profile {
    let points = points_rpm.iter().map(|&(t, n)| (t, rad_per_s(n))).collect();
    Profile::new(points).expect("points in order")
}

/// Engine up to 2400 rpm and back, the wheel turned three times.
pub(crate) fn carrier_manoeuvre() -> InputProfiles {
    let mut inputs = InputProfiles::default();
    let engine = [
        (0.0, 900.0),
        (1.0, 900.0),
        (2.0, 2400.0),
        (7.0, 2400.0),
        (7.5, 900.0),
    ];
    inputs.set(Input::EngineSpeed, speed(&engine));
    let mut wheel = vec![(0.0, 0.0)];
    for (from, to, rate) in [(3.0, 4.0, 90.0), (5.0, 6.0, -90.0), (8.0, 9.0, 90.0)] {
        wheel.extend([
            (from, 0.0),
            (from + 0.05, rate),
            (to, rate),
            (to + 0.05, 0.0),
        ]);
    }
    inputs.set(Input::WheelRate, speed(&wheel));
    inputs.set(Input::ExcessCommand, Profile::constant(1.0));
    inputs
}
