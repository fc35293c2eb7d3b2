//! What the modes say, tried in time: near the border of hunting, beyond it, and with friction.

use helmsplit_acceptance::equilibria::{bench, bench_point};
use helmsplit_scenario::Scenario;
use helmsplit_scenario::parameter::valve_edges::DISC_HOLE_DIAMETER;
use helmsplit_sim::Watch;
use helmsplit_study::{
    Kick, KickOptions, KickOutcome, Variable, border, equilibrium, friction_test, kick,
};

/// The border of the disc hole at 2400 rpm, 130 and 2 bar, m.
fn hunting_border(scenario: &Scenario) -> f64 {
    let point = bench_point(2400.0, 130.0, 2.0);
    let hole = Variable::Parameter(DISC_HOLE_DIAMETER);
    let found = border(scenario, &point, hole, 0.5e-3, 0.8e-3).expect("a border");
    found.value
}

fn kicked(scenario: &Scenario, hole: f64, options: &KickOptions) -> Kick {
    let point = bench_point(2400.0, 130.0, 2.0).with(DISC_HOLE_DIAMETER, hole);
    let rest = equilibrium(scenario, &point).expect("an equilibrium");
    let modes = rest.modes().expect("modes");
    let mode = modes.least_damped().expect("a mode that swings");
    kick(scenario, &rest, mode, options, &mut Watch::none()).expect("a kick")
}

/// Small enough that nothing bends: from a tenth of a micrometre on, the oil in the damping holes
/// leaves its laminar zone and damps more.
const SMALL: KickOptions = KickOptions {
    size: 1e-8,
    cycles: 40,
    friction: false,
    tolerance: 1e-11,
    until_plain: false,
};

#[test]
fn just_inside_it_decays_and_just_outside_it_grows() {
    let scenario = bench();
    let at = hunting_border(&scenario);
    for (hole, grows) in [(0.99 * at, false), (1.01 * at, true)] {
        let kick = kicked(&scenario, hole, &SMALL);
        let frequency = kick.frequency.unwrap();
        let off = frequency / kick.predicted_frequency - 1.0;
        assert!(off.abs() < 0.02, "{frequency} Hz, off by {off}");
        let growth = kick.growth.unwrap();
        assert_eq!(growth > 0.0, grows, "{growth} 1/s");
        // In shares of the mode's own rate: the damping ratio within 0.002.
        let rate = std::f64::consts::TAU * kick.predicted_frequency;
        let ratio = (growth - kick.predicted_growth) / rate;
        assert!(
            ratio.abs() < 2e-3,
            "{growth} against {} 1/s",
            kick.predicted_growth
        );
        let (first, last) = (kick.travel[2], kick.travel[kick.travel.len() - 1]);
        assert_eq!(last > first, grows, "from {first} to {last} m");
    }
}

#[test]
fn beyond_the_border_it_ends_in_a_limit_cycle() {
    let scenario = bench();
    let options = KickOptions {
        cycles: 600,
        ..KickOptions::default()
    };
    let kick = kicked(&scenario, 0.8e-3, &options);
    match kick.outcome {
        KickOutcome::LimitCycle {
            travel,
            inlet_pressure,
            frequency,
        } => {
            // The damping holes leave their laminar zone and damp more: the hunt stays small.
            assert!((5e-6..1e-3).contains(&travel), "{travel} m");
            assert!(inlet_pressure > 1e4, "{inlet_pressure} Pa");
            // The mode grows at 61.7 Hz; the hunt that it ends in has the pull of the damping
            // holes against it and settles near the frequency at the border.
            let off = frequency / kick.predicted_frequency - 1.0;
            assert!(off.abs() < 0.05, "{frequency} Hz, off by {off}");
        }
        other => panic!("{other:?}: {:?}", kick.travel),
    }
}

#[test]
fn dry_friction_hides_a_hunt_from_a_small_kick() {
    let mut scenario = bench();
    scenario.set("valve.friction", "bristle").unwrap();
    scenario.set("valve.coulomb_friction", "30 N").unwrap();
    scenario.set("valve.breakaway_friction", "35 N").unwrap();
    let point = bench_point(2400.0, 130.0, 2.0).with(DISC_HOLE_DIAMETER, 0.75e-3);
    let rest = equilibrium(&scenario, &point).unwrap();
    assert!(!rest.stability.is_stable(), "{:?}", rest.stability);
    assert_eq!(rest.left_out().len(), 1, "{:?}", rest.left_out());
    let options = KickOptions {
        tolerance: 1e-6,
        ..KickOptions::default()
    };
    let test = friction_test(&scenario, &rest, &options, &mut Watch::none());
    let test = test.unwrap().unwrap();
    assert!(
        test.hides_hunting,
        "{:?} {:?} {:?}",
        test.without.outcome, test.with.outcome, test.with.travel
    );
    assert_ne!(
        test.without.outcome,
        KickOutcome::DiesOut,
        "it hunts without"
    );
}

#[test]
fn a_calm_circuit_hides_nothing() {
    let scenario = bench();
    let rest = equilibrium(&scenario, &bench_point(900.0, 10.0, 2.0)).unwrap();
    let options = KickOptions {
        tolerance: 1e-6,
        ..KickOptions::default()
    };
    let test = friction_test(&scenario, &rest, &options, &mut Watch::none());
    let test = test.unwrap().unwrap();
    assert!(!test.hides_hunting, "it is calm by itself");
    assert_eq!(
        test.without.outcome,
        KickOutcome::DiesOut,
        "{:?}",
        test.without.travel
    );
    assert_eq!(
        test.with.outcome,
        KickOutcome::DiesOut,
        "{:?}",
        test.with.travel
    );
}
