//! Operating maps and frequency responses of whole circuits.

use std::sync::Mutex;
use std::sync::atomic::{AtomicBool, Ordering};

use helmsplit_acceptance::equilibria::{bench, bench_point, preset};
use helmsplit_scenario::PRESETS;
use helmsplit_scenario::parameter::{oil, valve_edges};
use helmsplit_study::{
    Axis, CheckId, Excitation, Layer, MapEnd, MapSpec, MapWatch, OperatingPoint, Spot, Status,
    Variable, check_maps, equilibrium, frequency_response, map_checks, operating_map,
};

/// A small map of the bench.
fn small(x: Variable, y: Variable, lines: usize) -> MapSpec {
    let scenario = bench();
    MapSpec {
        x: Axis::usual(&scenario, x, lines),
        y: Axis::usual(&scenario, y, lines),
        point: bench_point(2400.0, 130.0, 2.0),
        refine: false,
    }
}

#[test]
fn every_cell_is_the_equilibrium_of_its_point() {
    let scenario = bench();
    let spec = small(Variable::EngineSpeed, Variable::SteeringPressure, 5);
    let map = operating_map(&scenario, &spec, MapWatch::none()).unwrap();
    assert_eq!(map.failed(), 0, "every place comes to rest");
    for y in 0..5 {
        for x in 0..5 {
            let cell = map.spots[map.index(x, y)].cell().unwrap();
            let point = map.point(&scenario, x, y).unwrap();
            let alone = equilibrium(&scenario, &point).unwrap();
            let flow = alone.signal(helmsplit_model::Signal::PriorityFlow);
            assert!((cell.priority_flow / flow - 1.0).abs() < 1e-6, "{x} {y}");
            let (a, b) = (cell.damping.unwrap(), alone.stability.damping.unwrap());
            assert!((a - b).abs() < 1e-5, "{x} {y}: {a} {b}");
        }
    }
}

/// Axes that change the circuit give the same cells as axes that change its inputs, whichever
/// lies along x.
#[test]
fn axes_may_be_swapped() {
    let scenario = bench();
    let temperature = Variable::Parameter(oil::TEMPERATURE);
    let one = small(temperature, Variable::EngineSpeed, 4);
    let other = MapSpec {
        x: one.y,
        y: one.x,
        ..one.clone()
    };
    let one = operating_map(&scenario, &one, MapWatch::none()).unwrap();
    let other = operating_map(&scenario, &other, MapWatch::none()).unwrap();
    for y in 0..4 {
        for x in 0..4 {
            let a = one.spots[one.index(x, y)].cell().unwrap();
            let b = other.spots[other.index(y, x)].cell().unwrap();
            assert!((a.travel - b.travel).abs() < 1e-9, "{x} {y}");
        }
    }
}

/// The border of hunting on a map of disc hole and speed runs through the border found alone.
#[test]
fn the_border_on_the_map_is_the_border_found_alone() {
    let scenario = bench();
    let hole = Variable::Parameter(valve_edges::DISC_HOLE_DIAMETER);
    let spec = MapSpec {
        x: Axis {
            variable: hole,
            from: 0.5e-3,
            to: 0.8e-3,
            lines: 13,
        },
        y: Axis {
            variable: Variable::EngineSpeed,
            from: 240.0,
            to: 252.0,
            lines: 3,
        },
        point: bench_point(2400.0, 130.0, 2.0),
        refine: false,
    };
    let map = operating_map(&scenario, &spec, MapWatch::none()).unwrap();
    let border = map.stability_border();
    let speed = 2400.0 * std::f64::consts::PI / 30.0;
    let nearest = border
        .iter()
        .flat_map(|line| &line.points)
        .min_by(|a, b| (a.1 - speed).abs().total_cmp(&(b.1 - speed).abs()))
        .unwrap();
    assert!((nearest.0 - 0.656e-3).abs() < 5e-6, "{border:?}");
    let damping = map.contours(Layer::Damping, &[0.0]);
    assert!(!damping.is_empty(), "the damping layer has the same line");
}

#[test]
fn refined_lines_gather_and_the_grid_is_as_large_as_asked() {
    let scenario = preset("orchard_carrier");
    let mut spec = MapSpec::usual(&scenario);
    spec.x.lines = 16;
    spec.y.lines = 12;
    let map = operating_map(&scenario, &spec, MapWatch::none()).unwrap();
    assert_eq!((map.xs.len(), map.ys.len()), (16, 12), "as asked");
    assert!(map.spots.iter().all(|spot| *spot != Spot::Waiting), "all");
    let steps: Vec<f64> = map.xs.windows(2).map(|p| p[1] - p[0]).collect();
    let (least, most) = steps
        .iter()
        .fold((f64::MAX, 0.0_f64), |(l, m), &s| (l.min(s), m.max(s)));
    assert!(most > 1.5 * least, "lines gather: {steps:?}");
}

#[test]
fn news_tell_every_spot_and_cancelling_keeps_the_rest_waiting() {
    let scenario = bench();
    let spec = small(Variable::EngineSpeed, Variable::SteeringPressure, 8);
    let heard = Mutex::new(Vec::new());
    let hear = |news: &helmsplit_study::MapNews<'_>| {
        let mut heard = heard.lock().unwrap();
        heard.extend(news.places.iter().copied());
        assert_eq!(news.total, 64, "eight by eight");
        assert_eq!(news.places.len(), news.spots.len(), "one spot a place");
    };
    let watch = MapWatch::none().with_news(&hear);
    operating_map(&scenario, &spec, watch).unwrap();
    let mut places = heard.into_inner().unwrap();
    places.sort_unstable();
    assert_eq!(places, (0..64).collect::<Vec<_>>(), "each once");

    let stop = AtomicBool::new(false);
    let hear = |_: &helmsplit_study::MapNews<'_>| stop.store(true, Ordering::Relaxed);
    let watch = MapWatch::none().with_cancel(&stop).with_news(&hear);
    let map = operating_map(&scenario, &spec, watch).unwrap();
    assert_eq!(map.end, MapEnd::Cancelled, "stopped");
    let waiting = map.spots.iter().filter(|s| **s == Spot::Waiting).count();
    assert!(waiting > 0 && waiting < 64, "{waiting} of 64 wait");
}

#[test]
fn what_cannot_be_mapped_is_said() {
    let scenario = bench();
    let wheel = small(Variable::EngineSpeed, Variable::WheelRate, 4);
    let error = operating_map(&scenario, &wheel, MapWatch::none()).unwrap_err();
    assert!(error.to_string().contains("no steering wheel"), "{error}");
    let twice = small(Variable::EngineSpeed, Variable::EngineSpeed, 4);
    let error = operating_map(&scenario, &twice, MapWatch::none()).unwrap_err();
    assert!(error.to_string().contains("the same"), "{error}");
    let mut backwards = small(Variable::EngineSpeed, Variable::SteeringPressure, 4);
    backwards.x.to = 0.0;
    let error = operating_map(&scenario, &backwards, MapWatch::none()).unwrap_err();
    assert!(error.to_string().contains("above the start"), "{error}");
}

#[test]
fn the_map_answers_the_five_checks_of_every_preset() {
    for preset in PRESETS {
        let scenario = preset.scenario().unwrap();
        let maps = check_maps(&scenario, MapWatch::none()).unwrap();
        let checks = map_checks(&scenario, &maps);
        let ids: Vec<CheckId> = checks.iter().map(|check| check.id).collect();
        assert_eq!(
            ids,
            [
                CheckId::PriorityAtIdle,
                CheckId::Regulation,
                CheckId::Damping,
                CheckId::StrokeReserve,
                CheckId::RippleClearance,
            ],
            "{}",
            preset.key
        );
        for check in &checks {
            assert_ne!(check.status, Status::NeedsMap, "{}: {check:?}", preset.key);
            let answered = check.figure.is_some() && check.evidence.is_some();
            let excused = matches!(check.status, Status::NotApplicable(_));
            assert!(answered || excused, "{}: {check:?}", preset.key);
        }
        let ripple = scenario.parts().unwrap().pump.ripple;
        let states_ripple = ripple != helmsplit_model::Ripple::None;
        let asked = !matches!(checks[4].status, Status::NotApplicable(_));
        assert!(states_ripple || !asked, "{}: no ripple stated", preset.key);
    }
}

/// At rest a response is the slope of the equilibrium: what a slow change does.
#[test]
fn the_slow_response_is_the_slope_of_the_equilibrium() {
    let scenario = bench();
    let point = bench_point(2400.0, 70.0, 2.0);
    let rest = equilibrium(&scenario, &point).unwrap();
    for (excitation, variable, step) in [
        (Excitation::EngineSpeed, Variable::EngineSpeed, 0.01),
        (Excitation::SteeringLoad, Variable::SteeringPressure, 1e3),
        (Excitation::ExcessLoad, Variable::ExcessPressure, 1e3),
    ] {
        let names = ["p_in", "x", "q_priority", "q_excess"];
        let slow = frequency_response(&rest, excitation, &names, &[1e-4]).unwrap();
        let at = |by: f64| {
            let mut there = point.clone();
            let value = match variable {
                Variable::EngineSpeed => point.engine_speed,
                Variable::SteeringPressure => 70e5,
                _ => 2e5,
            };
            variable.apply(&scenario, &mut there, value + by).unwrap();
            equilibrium(&scenario, &there).unwrap()
        };
        let (above, below) = (at(step), at(-step));
        for response in &slow {
            let read = |rest: &helmsplit_study::Equilibrium| match response.name.as_str() {
                "q_priority" => rest.signal(helmsplit_model::Signal::PriorityFlow),
                "q_excess" => rest.signal(helmsplit_model::Signal::ExcessFlow),
                name => rest.named(name).unwrap(),
            };
            let slope = (read(&above) - read(&below)) / (2.0 * step);
            let found = response.values[0].0;
            assert!(
                (found - slope).abs() <= 1e-3 * slope.abs() + 1e-16,
                "{} over {excitation:?}: {found} against {slope}",
                response.name
            );
        }
    }
}

#[test]
fn ripple_bands_and_clearance_follow_the_pump() {
    let scenario = preset("workshop_bench");
    let bands = helmsplit_study::ripple_bands(&scenario).unwrap();
    let teeth = scenario.si(helmsplit_scenario::parameter::pump::TEETH);
    let ratings = scenario.ratings();
    let expected = teeth * ratings.low_idle_speed / std::f64::consts::TAU;
    assert!((bands[0].low / expected - 1.0).abs() < 1e-12, "{bands:?}");
    assert!(
        (bands[1].high / bands[0].high - 2.0).abs() < 1e-12,
        "{bands:?}"
    );
    let rest = equilibrium(&scenario, &OperatingPoint::resting(&scenario)).unwrap();
    let near = helmsplit_study::ripple_clearance(&scenario, &rest).unwrap();
    if let Some(near) = near {
        assert!(near.damping < helmsplit_study::LIGHT, "{near:?}");
        assert!(
            (near.distance - (near.ripple - near.mode).abs() / near.mode).abs() < 1e-12,
            "{near:?}"
        );
    }
    let none = helmsplit_study::ripple_bands(&preset("orchard_carrier")).unwrap();
    assert!(none.is_empty(), "no ripple stated");
}
