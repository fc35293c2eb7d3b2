//! The checks that the operating map answers.

use helmsplit_model::Quantity;
use helmsplit_scenario::Scenario;

use super::cell::{Cell, SLOW};
use super::compute::{MapEnd, OperatingMap};
use crate::check::{Check, CheckId, Evidence, Limit, Measure, Operand, Status};
use crate::equilibrium::Equilibrium;
use crate::frequency::LIGHT;
use crate::operating::{Frozen, Variable};

const PRACTICE: &str = "equilibria and eigenvalues of the exact Jacobian (docs/model.md, M11), dry \
                        friction left out; limit: common practice, no source";

/// Speeds within this share of the range's end count as the end.
const AT_END: f64 = 1e-6;

/// A place on a map.
#[derive(Clone, Copy)]
struct Place<'a> {
    map: &'a OperatingMap,
    x: f64,
    y: f64,
    cell: &'a Cell,
}

/// The five checks that one run cannot answer, from maps over the operating range as
/// [`crate::check_maps`] makes them: priority flow at low idle, regulation, damping, stroke in
/// reserve, and clearance of the pump's ripple.
#[must_use]
pub fn map_checks(scenario: &Scenario, maps: &[OperatingMap]) -> Vec<Check> {
    let places: Vec<Place<'_>> = maps
        .iter()
        .flat_map(|map| {
            map.cells()
                .map(move |(x, y, cell)| Place { map, x, y, cell })
        })
        .collect();
    let mut checks = vec![
        priority_at_idle(scenario, &places),
        regulation(scenario, &places),
        damping(scenario, &places),
        stroke_reserve(scenario, &places),
        ripple(scenario, &places),
    ];
    let failed: usize = maps.iter().map(OperatingMap::failed).sum();
    let cancelled = maps.iter().any(|map| map.end == MapEnd::Cancelled);
    let several = places.iter().filter(|place| place.cell.several).count();
    for check in &mut checks {
        let mut notes = Vec::new();
        if !check.note.is_empty() {
            notes.push(check.note.clone());
        }
        if failed > 0 {
            notes.push(format!(
                "no equilibrium found at {failed} places of the map"
            ));
        }
        if cancelled {
            notes.push("the map was cancelled before its end".to_owned());
        }
        if several > 0 {
            notes.push(format!(
                "at {several} places the past decides between two equilibria"
            ));
        }
        check.note = notes.join("; ");
    }
    checks
}

/// A verdict table in which every check that waits for the map has its answer.
#[must_use]
pub fn with_map_checks(checks: &[Check], answers: &[Check]) -> Vec<Check> {
    let answered = |check: &Check| {
        let answer = answers.iter().find(|answer| answer.id == check.id);
        match answer {
            Some(answer) if check.status == Status::NeedsMap => answer.clone(),
            _ => check.clone(),
        }
    };
    checks.iter().map(answered).collect()
}

/// The place with the least value of `figure`; what is not a number does not count.
fn least<'a>(
    places: impl Iterator<Item = &'a Place<'a>>,
    figure: impl Fn(&Cell) -> f64,
) -> Option<(Place<'a>, f64)> {
    places
        .map(|place| (*place, figure(place.cell)))
        .filter(|(_, value)| !value.is_nan())
        .min_by(|a, b| a.1.total_cmp(&b.1))
}

const NO_MAP: &str = "the map has no equilibrium to look at";

/// Where on the map the figure was read, as numbers.
fn coordinates(place: Place<'_>) -> Vec<Operand> {
    let mut all = Vec::new();
    for (axis, value) in [(place.map.spec.x, place.x), (place.map.spec.y, place.y)] {
        all.push(operand(
            &format!("at {}", axis.variable.label().to_lowercase()),
            value,
            axis.variable.quantity(),
        ));
    }
    if let crate::SteeringDuty::Turning { wheel_rate, .. } = place.map.spec.point.steering {
        all.push(operand(
            "at wheel rate",
            wheel_rate,
            Quantity::AngularVelocity,
        ));
    }
    all
}

fn operand(name: &str, si: f64, quantity: Quantity) -> Operand {
    Operand {
        name: name.to_owned(),
        value: Measure::new(si, quantity),
    }
}

fn evidence(formula: &'static str, mut operands: Vec<Operand>, place: Place<'_>) -> Evidence {
    operands.extend(coordinates(place));
    Evidence {
        time: None,
        column: None,
        formula,
        operands,
        source: PRACTICE,
    }
}

/// Places at one end of the speed range.
fn at_speed<'a>(places: &'a [Place<'a>], speed: f64) -> impl Iterator<Item = &'a Place<'a>> {
    places.iter().filter(move |place| {
        place.map.spec.x.variable == Variable::EngineSpeed
            && (place.x - speed).abs() <= AT_END * speed
    })
}

fn priority_at_idle(scenario: &Scenario, places: &[Place<'_>]) -> Check {
    let id = CheckId::PriorityAtIdle;
    let ratings = scenario.ratings();
    let worst = least(at_speed(places, ratings.low_idle_speed), |cell| {
        cell.priority_flow
    });
    let Some((place, flow)) = worst else {
        return Check::not_applicable(id, NO_MAP);
    };
    let operands = vec![
        operand("least priority flow", flow, Quantity::Flow),
        operand("demand", ratings.priority_demand, Quantity::Flow),
    ];
    Check::measured(
        id,
        Measure::ratio(flow / ratings.priority_demand),
        Limit::AtLeast(scenario.limits().priority_at_idle),
        evidence(
            "least settled priority flow at low idle / demand",
            operands,
            place,
        ),
    )
}

fn regulation(scenario: &Scenario, places: &[Place<'_>]) -> Check {
    let id = CheckId::Regulation;
    let worst = least(places.iter(), |cell| -cell.priority_error.abs());
    let Some((place, _)) = worst else {
        return Check::not_applicable(id, NO_MAP);
    };
    let flows = places.iter().map(|p| p.cell.priority_flow);
    let (low, high) = flows.fold((f64::INFINITY, f64::NEG_INFINITY), |(low, high), q| {
        (low.min(q), high.max(q))
    });
    let operands = vec![
        operand("set flow", scenario.ratings().set_flow, Quantity::Flow),
        operand("least priority flow", low, Quantity::Flow),
        operand("largest priority flow", high, Quantity::Flow),
    ];
    Check::measured(
        id,
        Measure::ratio(place.cell.priority_error.abs()),
        Limit::AtMost(scenario.limits().regulation),
        evidence(
            "largest |settled priority flow / set flow - 1| over the map",
            operands,
            place,
        ),
    )
}

fn damping(scenario: &Scenario, places: &[Place<'_>]) -> Check {
    let id = CheckId::Damping;
    let runs_away = places
        .iter()
        .find(|p| !p.cell.stable && p.cell.growth > 0.0 && p.cell.damping.is_none_or(|d| d > 0.0));
    let worst = least(places.iter(), |cell| {
        cell.slow_damping.map_or(f64::NAN, |(damping, _)| damping)
    });
    let Some((place, damping)) = worst else {
        return Check::not_applicable(id, "nothing swings anywhere on the map");
    };
    let frequency = place.cell.slow_damping.map_or(f64::NAN, |(_, f)| f);
    let fastest = least(places.iter(), |cell| cell.damping.unwrap_or(f64::NAN));
    let mut operands = vec![
        operand("least damping ratio", damping, Quantity::Ratio),
        // The units know no hertz: cycles per second count as a plain number.
        operand("its frequency in Hz", frequency, Quantity::Count),
        operand("modes looked at, below Hz", SLOW, Quantity::Count),
    ];
    if let Some((_, any)) = fastest {
        operands.push(operand(
            "least damping ratio of all modes",
            any,
            Quantity::Ratio,
        ));
    }
    let unstable = places.iter().filter(|p| !p.cell.stable).count();
    let check = Check::measured(
        id,
        Measure::ratio(damping),
        Limit::AtLeast(scenario.limits().damping),
        evidence(
            "least -Re(s) / |s| of all eigenvalues s below 500 Hz over the map",
            operands,
            place,
        ),
    );
    let note = if let Some(place) = runs_away {
        format!(
            "the equilibrium runs away at {unstable} places of the map, by {:.3} 1/s",
            place.cell.growth
        )
    } else if unstable > 0 {
        format!(
            "hunts at {unstable} of {} places of the map unless dry friction hides it",
            places.len()
        )
    } else {
        match mode_at(scenario, place) {
            Some(who) => format!("{who} at {frequency:.0} Hz"),
            None => format!("at {frequency:.0} Hz"),
        }
    };
    let mut check = check.with_note(note);
    if unstable > 0 {
        check.status = Status::Fail;
    }
    check
}

/// Who swings in the least damped mode that counts at a place.
fn mode_at(scenario: &Scenario, place: Place<'_>) -> Option<String> {
    let point = place.map.spec.point_at(scenario, place.x, place.y).ok()?;
    let frozen = Frozen::new(scenario, &point).ok()?;
    let rest = Equilibrium::near(frozen, &point, &place.cell.state).ok()?;
    let modes = rest.modes().ok()?;
    let slow = modes
        .oscillations()
        .find(|mode| mode.frequency().is_some_and(|f| f < SLOW))?;
    Some(slow.name())
}

fn stroke_reserve(scenario: &Scenario, places: &[Place<'_>]) -> Check {
    let id = CheckId::StrokeReserve;
    let worst = least(at_speed(places, scenario.ratings().top_speed), |cell| {
        cell.stroke_reserve
    });
    let Some((place, reserve)) = worst else {
        return Check::not_applicable(id, NO_MAP);
    };
    let operands = vec![operand("spool travel", place.cell.travel, Quantity::Length)];
    Check::measured(
        id,
        Measure::ratio(reserve),
        Limit::AtLeast(scenario.limits().stroke_reserve),
        evidence(
            "(stroke - spool travel) / stroke, least at governed speed",
            operands,
            place,
        ),
    )
}

fn ripple(scenario: &Scenario, places: &[Place<'_>]) -> Check {
    let id = CheckId::RippleClearance;
    let strokes = scenario
        .parts()
        .map_or(0.0, |parts| parts.pump.ripple.per_revolution());
    if strokes <= 0.0 {
        return Check::not_applicable(id, "the circuit states no ripple of its pump (pump.ripple)");
    }
    let worst = least(places.iter(), |cell| {
        cell.ripple.map_or(f64::NAN, |near| near.distance)
    });
    let Some((place, distance)) = worst else {
        return Check::not_applicable(id, "no mode on the map is lightly damped");
    };
    let mut operands = vec![operand(
        "lightly damped: damping ratio below",
        LIGHT,
        Quantity::Ratio,
    )];
    let mut note = String::new();
    if let Some(near) = place.cell.ripple {
        operands.push(operand("ripple in Hz", near.ripple, Quantity::Count));
        operands.push(operand("mode in Hz", near.mode, Quantity::Count));
        operands.push(operand("its damping ratio", near.damping, Quantity::Ratio));
        note = format!(
            "harmonic {} of the ripple at {:.0} Hz, mode at {:.0} Hz with damping ratio {:.2}",
            near.harmonic, near.ripple, near.mode, near.damping
        );
    }
    Check::measured(
        id,
        Measure::ratio(distance),
        Limit::AtLeast(scenario.limits().ripple_clearance),
        evidence(
            "|ripple frequency - mode frequency| / mode frequency, least over the map",
            operands,
            place,
        ),
    )
    .with_note(note)
}
