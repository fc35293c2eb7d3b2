//! Equilibria, modes and maps of whole circuits: what must hold beyond the published values of
//! docs/verification.md.

use helmsplit_acceptance::equilibria::{LPM, RPM, bench, bench_point, preset};
use helmsplit_model::Signal;
use helmsplit_scenario::PRESETS;
use helmsplit_scenario::parameter::{valve, valve_edges};
use helmsplit_study::{
    BorderKind, EquilibriumError, ForceKind, ModeKind, OperatingPoint, Part, PointError,
    SteeringDuty, StudyError, Sweep, Variable, border, borders, equilibria, equilibrium, mode_path,
};

#[test]
fn every_preset_comes_to_rest_in_every_duty() {
    for preset in PRESETS {
        let scenario = preset.scenario().unwrap();
        let rest = OperatingPoint::resting(&scenario);
        let mut points = vec![rest.clone()];
        if rest.steering == SteeringDuty::Rest {
            for wheel_rate in [3.0, -9.0] {
                let load = 30e5;
                points.extend(
                    [
                        SteeringDuty::Turning { wheel_rate, load },
                        SteeringDuty::AtLock { wheel_rate },
                    ]
                    .map(|duty| rest.clone().steering(duty)),
                );
            }
        }
        for point in points {
            for speed in [900.0, 1500.0] {
                let point = point.clone().at_speed(speed * RPM);
                let found = equilibrium(&scenario, &point)
                    .unwrap_or_else(|error| panic!("{}: {point:?}: {error}", preset.key));
                let forces = found.forces();
                let sum = forces.iter().find(|f| f.kind == ForceKind::Sum).unwrap();
                assert!(sum.force.abs() < 1e-3, "{}: {forces:?}", preset.key);
                assert!(found.residual <= 1e-6, "{}: {found:?}", preset.key);
                let modes = found.modes().unwrap();
                for mode in &modes.all {
                    let whole: f64 = mode.shares.iter().map(|s| s.share).sum();
                    assert!((whole - 1.0).abs() < 1e-9, "{}: {mode:?}", preset.key);
                }
                let eigenvalues = found.stability.eigenvalues.len();
                let free = found.state.len() - found.held().len();
                assert_eq!(eigenvalues, free, "{}: one a free state", preset.key);
            }
        }
    }
}

/// While the wheel turns, the cylinder moves on at the rate that the metered oil gives it, and
/// that is no drift away from the equilibrium.
#[test]
fn a_turning_wheel_moves_the_cylinder_steadily() {
    let scenario = preset("orchard_carrier");
    let wheel_rate = 90.0 * RPM;
    let point = OperatingPoint::resting(&scenario)
        .at_speed(1500.0 * RPM)
        .steering(SteeringDuty::Turning {
            wheel_rate,
            load: 20e5,
        });
    let found = equilibrium(&scenario, &point).unwrap();
    let area = 25e-4;
    let asked = wheel_rate * 125e-6 / std::f64::consts::TAU / area;
    let velocity = found.named("v_c").unwrap();
    assert!((velocity / asked - 1.0).abs() < 1e-2, "{velocity} {asked}");
    assert_eq!(found.held().len(), 1, "the cylinder's travel is held");
    // Load 20 bar, tyre friction 10 kN sliding, damping 30 kN s/m: all on 25 cm2.
    let expected = 20e5 + (10e3 + 30e3 * velocity) / area;
    let load = found.signal(Signal::SteeringLoadPressure);
    assert!((load / expected - 1.0).abs() < 1e-6, "{load} {expected}");
}

#[test]
fn both_sides_find_the_same_equilibrium_where_there_is_one() {
    let scenario = bench();
    for (speed, steering, excess) in [(900.0, 10.0, 150.0), (2400.0, 130.0, 2.0)] {
        let all = equilibria(&scenario, &bench_point(speed, steering, excess)).unwrap();
        assert_eq!(all.len(), 1, "{speed} rpm, {steering} and {excess} bar");
    }
}

/// The modes do not depend on who asks, nor on the path by which the equilibrium was reached.
#[test]
fn a_followed_equilibrium_is_the_one_found_from_rest() {
    let scenario = bench();
    let start = equilibrium(&scenario, &bench_point(900.0, 70.0, 2.0)).unwrap();
    let there = bench_point(2400.0, 70.0, 2.0);
    let followed = start.follow(&scenario, &there).unwrap();
    let fresh = equilibrium(&scenario, &there).unwrap();
    assert!(followed.is_same(&fresh), "the same state");
    let hot = there.clone().with(valve::SPOOL_MASS, 0.2);
    let followed = start.follow(&scenario, &hot).unwrap();
    let fresh = equilibrium(&scenario, &hot).unwrap();
    let (a, b) = (followed.stability.damping, fresh.stability.damping);
    assert!((a.unwrap() - b.unwrap()).abs() < 1e-6, "{a:?} {b:?}");
}

#[test]
fn the_mode_that_hunts_is_named_by_its_parts() {
    let scenario = bench();
    let hole = Variable::Parameter(valve_edges::DISC_HOLE_DIAMETER);
    let found = border(
        &scenario,
        &bench_point(2400.0, 130.0, 2.0),
        hole,
        0.5e-3,
        0.8e-3,
    )
    .unwrap();
    assert_eq!(found.kind, BorderKind::Hunting, "{found:?}");
    assert!(found.stable_below, "a wide hole hunts");
    let modes = found.equilibrium.modes().unwrap();
    let hunting = modes.least_damped().unwrap();
    assert!(hunting.damping().unwrap().abs() < 1e-6, "{hunting:?}");
    let parts: Vec<Part> = hunting.shares.iter().take(3).map(|s| s.part).collect();
    assert!(parts.contains(&Part::Spool), "{parts:?}");
    assert!(parts.contains(&Part::Inlet), "{parts:?}");
    assert!(
        hunting.name().contains("inlet volume"),
        "{}",
        hunting.name()
    );
}

#[test]
fn a_path_of_modes_goes_on_without_jumps() {
    let scenario = bench();
    let hole = Variable::Parameter(valve_edges::DISC_HOLE_DIAMETER);
    let sweep = Sweep::even(hole, 0.4e-3, 0.9e-3, 26);
    let point = bench_point(2400.0, 130.0, 2.0);
    let path = mode_path(&scenario, &point, &sweep).unwrap();
    assert!(path.lost.is_none(), "{:?}", path.lost);
    assert!(path.values.len() >= 26, "{}", path.values.len());
    for pathway in &path.pathways {
        for pair in pathway.eigenvalues.windows(2) {
            let size = pair[0].0.hypot(pair[0].1);
            let moved = (pair[1].0 - pair[0].0).hypot(pair[1].1 - pair[0].1);
            assert!(moved < 0.5 * size + 50.0, "{}: {pair:?}", pathway.name);
        }
    }
    // The one that comes nearest to hunting crosses the axis once.
    let damping: Vec<f64> = path.pathways[0].damping().flatten().collect();
    let crossings = damping
        .windows(2)
        .filter(|pair| (pair[0] > 0.0) != (pair[1] > 0.0));
    assert_eq!(crossings.count(), 1, "{damping:?}");
    let found = borders(&scenario, &point, &sweep).unwrap();
    assert_eq!(found.len(), 1, "{found:?}");
    assert!((found[0].value - 0.656e-3).abs() < 1e-6, "{found:?}");
}

/// Trapped oil that can only creep out through the end land is a slow mode, not an instability.
#[test]
fn a_plugged_disc_hole_drains_in_minutes() {
    let scenario = preset("orchard_carrier");
    let point = OperatingPoint::resting(&scenario)
        .at_speed(900.0 * RPM)
        .with(valve_edges::DISC_HOLE_DIAMETER, 0.0);
    let found = equilibrium(&scenario, &point).unwrap();
    assert!(found.stability.is_stable(), "{:?}", found.stability);
    let modes = found.modes().unwrap();
    let slowest = modes
        .all
        .iter()
        .filter(|mode| mode.kind == ModeKind::Decay)
        .map(helmsplit_study::Mode::time_constant)
        .fold(0.0, f64::max);
    assert!(slowest > 10.0, "{slowest} s");
}

#[test]
fn what_does_not_fit_is_said() {
    let scenario = bench();
    let point = OperatingPoint::resting(&scenario).steering(SteeringDuty::Rest);
    let error = equilibrium(&scenario, &point).unwrap_err();
    assert!(
        matches!(error, StudyError::Point(PointError::Steering { .. })),
        "{error}"
    );
    let point = bench_point(900.0, 10.0, 2.0).with(valve::SPOOL_MASS, -1.0);
    let error = equilibrium(&scenario, &point).unwrap_err().to_string();
    assert!(error.contains("valve.spool_mass"), "{error}");
    let mut fast = bench_point(900.0, 10.0, 2.0);
    fast.engine_speed = f64::NAN;
    let error = equilibrium(&scenario, &fast).unwrap_err().to_string();
    assert!(error.contains("engine speed"), "{error}");
    let error = Variable::from_name("engin-speed").unwrap_err().to_string();
    assert!(error.contains("did you mean engine-speed?"), "{error}");
}

/// A blocked port without any relief has no equilibrium within reason: the error says how near
/// the search came.
#[test]
fn failing_says_how_near_it_came() {
    let mut scenario = preset("orchard_carrier");
    scenario.set("excess.kind", "bench throttle").unwrap();
    scenario.set("steering.kind", "bench throttle").unwrap();
    // Air grows without bound in a suction line that gives nothing: nothing ever rests.
    let mut point = OperatingPoint::resting(&scenario);
    point.excess.command = 0.0;
    point.steering = SteeringDuty::Bench {
        pressure: 20e5,
        area: 0.0,
    };
    scenario.set("main_relief.kind", "none").unwrap();
    scenario.set("priority_relief.kind", "none").unwrap();
    match equilibrium(&scenario, &point) {
        Ok(found) => assert!(
            found.named("p_in").unwrap() > 500e5,
            "no relief, no limit: {:?}",
            found.named("p_in")
        ),
        Err(StudyError::Equilibrium(EquilibriumError::NotFound {
            residual, state, ..
        })) => {
            assert!(residual > 0.0, "{residual}");
            assert!(!state.is_empty(), "the state reached");
        }
        Err(other) => panic!("{other}"),
    }
}

#[test]
fn the_flow_of_every_preset_is_regulated_at_rest() {
    for preset in PRESETS {
        let scenario = preset.scenario().unwrap();
        let found = equilibrium(
            &scenario,
            &OperatingPoint::resting(&scenario).at_speed(1500.0 * RPM),
        )
        .unwrap();
        let set = scenario.ratings().set_flow;
        let flow = found.signal(Signal::PriorityFlow);
        assert!(
            (flow / set - 1.0).abs() < 0.2,
            "{}: {} L/min of {}",
            preset.key,
            flow * LPM,
            set * LPM
        );
    }
}
