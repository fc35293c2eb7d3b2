//! The hand formulas against the full model.

use helmsplit_model::{Input, Quantity, Signal};
use helmsplit_scenario::choice::{PumpCondition, SteeringKind};
use helmsplit_scenario::parameter::{pump, ratings};
use helmsplit_scenario::{Findings, Scenario};

use super::Sizing;
use crate::check::Measure;
use crate::equilibrium::{Equilibrium, equilibrium};
use crate::error::StudyError;
use crate::figure::Missing;
use crate::operating::{OperatingPoint, SteeringDuty};
use crate::study_watch::StudyWatch;

/// One figure, by hand and from the full model.
#[derive(Debug, Clone, PartialEq)]
pub struct Comparison {
    /// What is compared.
    pub label: &'static str,
    /// By hand.
    pub predicted: Measure,
    /// From the full model, SI, or why there is none.
    pub simulated: Result<f64, Missing>,
    /// Why both may differ.
    pub note: &'static str,
}

/// Sets the figures of a sizing beside those of the full model at rest. `scenario` is the circuit
/// with the sizing adopted; the consumer runs at the command that the manoeuvre gives it most.
#[must_use]
pub fn verify(scenario: &Scenario, sizing: &Sizing, watch: &StudyWatch<'_>) -> Vec<Comparison> {
    let points = match points(scenario, sizing) {
        Ok(points) => points,
        Err(findings) => {
            // Without inputs there is no point; each row says so.
            let missing = Missing::NoCircuit(findings.to_string());
            let rows = rows(scenario, sizing).into_iter();
            return rows.map(|row| row.compared(Err(missing.clone()))).collect();
        }
    };
    let rests = watch.each("full model", &points, |point| {
        if watch.is_cancelled() {
            return Err(Missing::Cancelled);
        }
        equilibrium(scenario, point).map_err(|error| match error {
            StudyError::Equilibrium(error) => Missing::NoOccasion(error.to_string()),
            error => Missing::NoCircuit(error.to_string()),
        })
    });
    rows(scenario, sizing)
        .into_iter()
        .map(|row| {
            let rest = rests[row.point as usize].as_ref().map_err(Clone::clone);
            let simulated = rest.and_then(row.read);
            row.compared(simulated)
        })
        .collect()
}

/// The points in the order of [`At`]: top speed with the wheel turned, top speed with nobody
/// steering, low idle with the pump worn and the wheel turned. The consumer runs at the command
/// that the manoeuvre gives it most.
fn points(scenario: &Scenario, sizing: &Sizing) -> Result<[OperatingPoint; 3], Findings> {
    let demand = &sizing.demand;
    let profiles = scenario.inputs()?;
    let commands = profiles.get(Input::ExcessCommand).points().iter();
    let command = commands.map(|&(_, value)| value).fold(0.0, f64::max);
    let mut start = OperatingPoint::at(scenario, 0.0)?;
    start.excess.command = command;
    let has_wheel = scenario.chosen::<SteeringKind>() == SteeringKind::SteeringUnit;
    let turned = |point: OperatingPoint, wheel_rate: f64| {
        if has_wheel {
            point.steering(SteeringDuty::Turning {
                wheel_rate,
                load: 0.0,
            })
        } else {
            point
        }
    };
    let top = start.clone().at_speed(scenario.si(ratings::TOP_SPEED));
    let still = if has_wheel {
        top.clone().steering(SteeringDuty::Rest)
    } else {
        top.clone()
    };
    let mut idle = start.at_speed(scenario.si(ratings::LOW_IDLE_SPEED));
    if scenario.chosen::<PumpCondition>() == PumpCondition::WearFactor {
        idle.put(pump::WEAR, demand.wear);
    }
    Ok([
        turned(top, demand.wheel_rate),
        still,
        turned(idle, demand.idle_wheel_rate),
    ])
}

/// Which of the points a row looks at.
#[derive(Clone, Copy)]
enum At {
    Turning,
    Still,
    Idle,
}

/// A figure by hand, and how the full model reads it.
struct Row {
    label: &'static str,
    predicted: Measure,
    point: At,
    read: Read,
    note: &'static str,
}

impl Row {
    fn compared(&self, simulated: Result<f64, Missing>) -> Comparison {
        Comparison {
            label: self.label,
            predicted: self.predicted,
            simulated,
            note: self.note,
        }
    }
}

/// Takes a number from an equilibrium.
type Read = fn(&Equilibrium) -> Result<f64, Missing>;

fn state(rest: &Equilibrium, name: &str) -> Result<f64, Missing> {
    let none = || Missing::NoOccasion(format!("the circuit has no {name}"));
    rest.named(name).ok_or_else(none)
}

const ALONE: &str = "by hand the damping wanted of the valve alone; in the circuit line, consumer and \
                     cylinder swing along";

const REGULATED: &str =
    "spring and jet add to it as the land opens; the orifice is a standard size";

#[allow(clippy::too_many_lines, reason = "a table")]
fn rows(scenario: &Scenario, sizing: &Sizing) -> Vec<Row> {
    let demand = &sizing.demand;
    let hand = |id: &str| sizing.step(id).map_or(f64::NAN, |step| step.result.si);
    let flow = |si: f64| Measure::new(si, Quantity::Flow);
    let pressure = |si: f64| Measure::new(si, Quantity::Pressure);
    let row = |label, predicted, point, read, note| Row {
        label,
        predicted,
        point,
        read,
        note,
    };
    let set_flow = flow(scenario.si(ratings::SET_FLOW));
    let priority: Read = |rest| Ok(rest.signal(Signal::PriorityFlow));
    let inlet: Read = |rest| state(rest, "p_in");
    let over_orifice: Read = |rest| Ok(state(rest, "p_in")? - state(rest, "p_b")?);
    let excess: Read = |rest| Ok(rest.signal(Signal::ExcessFlow));
    let over_land: Read = |rest| Ok(state(rest, "p_in")? - state(rest, "p_e")?);
    let damping: Read = |rest| {
        let none = || Missing::NoOccasion("nothing swings".to_owned());
        rest.stability.damping.ok_or_else(none)
    };
    let ratio = Measure::new(demand.damping_ratio, Quantity::Count);
    vec![
        row(
            "priority flow, top speed, wheel turned",
            set_flow,
            At::Turning,
            priority,
            REGULATED,
        ),
        row(
            "priority flow, top speed, nobody steers",
            set_flow,
            At::Still,
            priority,
            REGULATED,
        ),
        row(
            "drop over the fixed orifice, nobody steers",
            pressure(demand.spring_drop),
            At::Still,
            over_orifice,
            "by hand at the first opening of the land",
        ),
        row(
            "inlet pressure, wheel turned",
            pressure(hand("load-pressure") + demand.spring_drop),
            At::Turning,
            inlet,
            "by hand at the lock and without unit, line and priority holes",
        ),
        row(
            "excess flow, top speed, nobody steers",
            flow(hand("excess-flow")),
            At::Still,
            excess,
            "by hand without the pump's slip",
        ),
        row(
            "drop over the excess land, nobody steers",
            pressure(demand.land_drop),
            At::Still,
            over_land,
            "by hand the drop that was allowed; in the circuit what the consumer leaves",
        ),
        row(
            "priority flow, low idle, pump worn",
            flow(hand("idle-flow")),
            At::Idle,
            priority,
            "by hand the flow to be met: more is right",
        ),
        row(
            "least damping ratio, top speed, wheel turned",
            ratio,
            At::Turning,
            damping,
            ALONE,
        ),
        row(
            "least damping ratio, top speed, nobody steers",
            ratio,
            At::Still,
            damping,
            ALONE,
        ),
    ]
}
