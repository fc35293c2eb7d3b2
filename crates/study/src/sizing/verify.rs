//! The hand formulas against the full model.

use helmsplit_model::{Circuit, Input, InputSegment, Inputs, Quantity, Readings, Signal};
use helmsplit_scenario::choice::{PumpCondition, SteeringKind};
use helmsplit_scenario::parameter::{pump, ratings};
use helmsplit_scenario::{ParameterId, Scenario};
use helmsplit_sim::{CircuitOnSegment, Rest, SettleOptions, settle, state_scales};

use super::Sizing;
use crate::check::Measure;
use crate::figure::Missing;
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

/// A circuit at rest: what its signals and states read.
struct AtRest {
    circuit: Circuit,
    state: Vec<f64>,
    readings: Readings,
}

impl AtRest {
    fn signal(&self, signal: Signal) -> f64 {
        self.readings.get(signal)
    }

    fn state(&self, name: &str) -> f64 {
        self.circuit
            .state_index(name)
            .map_or(f64::NAN, |place| self.state[place])
    }
}

/// Engine speed, wheel rate and changed parameters of a point that is looked at.
struct Point {
    speed: ParameterId,
    wheel_rate: f64,
    changes: Vec<(ParameterId, f64)>,
}

/// Sets the figures of a sizing beside those of the full model at rest. `scenario` is the circuit
/// with the sizing adopted; the consumer runs at the command that the manoeuvre gives it most.
#[must_use]
pub fn verify(scenario: &Scenario, sizing: &Sizing, watch: &StudyWatch<'_>) -> Vec<Comparison> {
    let wheel = scenario.chosen::<SteeringKind>() == SteeringKind::SteeringUnit;
    let turned = |rate: f64| if wheel { rate } else { 0.0 };
    let demand = &sizing.demand;
    let worn = match scenario.chosen::<PumpCondition>() {
        PumpCondition::WearFactor => vec![(pump::WEAR, demand.wear)],
        PumpCondition::MeasuredEfficiency => Vec::new(),
    };
    let points = [
        Point {
            speed: ratings::TOP_SPEED,
            wheel_rate: turned(demand.wheel_rate),
            changes: Vec::new(),
        },
        Point {
            speed: ratings::TOP_SPEED,
            wheel_rate: 0.0,
            changes: Vec::new(),
        },
        Point {
            speed: ratings::LOW_IDLE_SPEED,
            wheel_rate: turned(demand.idle_wheel_rate),
            changes: worn,
        },
    ];
    let rests = watch.each("full model", &points, |point| {
        at_rest(scenario, point, watch)
    });
    rows(scenario, sizing)
        .into_iter()
        .map(|row| Comparison {
            label: row.label,
            predicted: row.predicted,
            simulated: rests[row.point as usize]
                .as_ref()
                .map(row.read)
                .map_err(Clone::clone),
            note: row.note,
        })
        .collect()
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
    let priority: Read = |rest| rest.signal(Signal::PriorityFlow);
    let inlet: Read = |rest| rest.state("p_in");
    let over_orifice: Read = |rest| rest.state("p_in") - rest.state("p_b");
    let excess: Read = |rest| rest.signal(Signal::ExcessFlow);
    let over_land: Read = |rest| rest.state("p_in") - rest.state("p_e");
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
    ]
}

/// Takes a number from a circuit at rest.
type Read = fn(&AtRest) -> f64;

/// The inputs of a point: those of the manoeuvre's start, with the consumer at its largest command.
fn inputs_at(scenario: &Scenario, point: &Point) -> Result<Inputs, Missing> {
    let profiles = scenario
        .inputs()
        .map_err(|findings| Missing::NoCircuit(findings.to_string()))?;
    let mut inputs = profiles.at(0.0);
    let commands = profiles.get(Input::ExcessCommand).points().iter();
    let largest = commands.map(|&(_, value)| value).fold(0.0, f64::max);
    inputs.set(Input::ExcessCommand, largest);
    inputs.set(Input::EngineSpeed, scenario.si(point.speed));
    inputs.set(Input::WheelRate, point.wheel_rate);
    inputs.set(Input::ExternalForce, 0.0);
    Ok(inputs)
}

/// The circuit at rest at a point.
fn at_rest(scenario: &Scenario, point: &Point, watch: &StudyWatch<'_>) -> Result<AtRest, Missing> {
    let mut scenario = scenario.clone();
    for &(id, si) in &point.changes {
        scenario
            .set_si(id, si)
            .map_err(|finding| Missing::NoCircuit(finding.to_string()))?;
    }
    let circuit = scenario
        .circuit()
        .map_err(|findings| Missing::NoCircuit(findings.to_string()))?;
    let inputs = inputs_at(&scenario, point)?;
    let scales = state_scales(&circuit);
    let frozen = CircuitOnSegment::new(&circuit, InputSegment::frozen(inputs), &scales);
    let settled = settle(
        &frozen,
        circuit.drifting_states(),
        &circuit.cold_state(&inputs),
        None,
        &SettleOptions::default(),
        &mut watch.run_watch(),
    )
    .map_err(|error| Missing::NoCircuit(error.to_string()))?;
    if watch.is_cancelled() {
        return Err(Missing::Cancelled);
    }
    if settled.rest == Rest::NotAtRest {
        return Err(Missing::NoOccasion(settled.to_string()));
    }
    let mut readings = Readings::default();
    circuit.observe(&inputs, &settled.state, &mut readings);
    Ok(AtRest {
        circuit,
        state: settled.state,
        readings,
    })
}
