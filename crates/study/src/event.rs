//! Moments of a run that a person would point at.

use helmsplit_model::{Circuit, PriorityRelief, Signal, SteeringSide};
use helmsplit_sim::Trace;

use crate::lock::is_locked;

/// What happened.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, serde::Serialize)]
#[serde(rename_all = "snake_case")]
pub enum EventKind {
    /// The main relief began to pass oil.
    MainReliefCracked,
    /// The relief on the priority port began to pass oil.
    PriorityReliefCracked,
    /// The pilot on the spring chamber began to pass oil.
    PilotCracked,
    /// The excess relief began to pass oil.
    ExcessReliefCracked,
    /// The spool reached the stop at full travel.
    SpoolAtStop,
    /// The steering cylinder reached its stop.
    SteeringAtLock,
    /// The wheel began to fall short of oil.
    DropoutBegan,
}

impl EventKind {
    /// A few words for a mark.
    #[must_use]
    pub fn label(self) -> &'static str {
        match self {
            Self::MainReliefCracked => "main relief cracked",
            Self::PriorityReliefCracked => "priority relief cracked",
            Self::PilotCracked => "pilot relief cracked",
            Self::ExcessReliefCracked => "excess relief cracked",
            Self::SpoolAtStop => "spool at its stop",
            Self::SteeringAtLock => "steering at the lock",
            Self::DropoutBegan => "wheel short of oil",
        }
    }
}

/// A moment of a run.
#[derive(Debug, Clone, Copy, PartialEq, serde::Serialize)]
pub struct Event {
    /// When, s.
    pub time: f64,
    /// What.
    pub kind: EventKind,
}

/// Opening from which a relief passes oil that matters.
const CRACKED: f64 = 0.01;

/// A condition must have been off this long (s) before it is told again: a relief that chatters
/// is one event.
const QUIET: f64 = 0.05;

/// Shortfall of the wheel that counts as an event, share of the commanded rate.
const SHORT: f64 = 0.05;

/// Wheel rate below which nobody would feel a shortfall, rad/s.
const FEELABLE: f64 = 0.1;

/// The events of a run, in time order. Each is placed on the solver's step that shows it first.
#[must_use]
pub fn events(circuit: &Circuit, trace: &Trace) -> Vec<Event> {
    let mut found = Vec::new();
    let times = trace.steps().times();
    let mut watch = |kind: EventKind, on: &dyn Fn(usize) -> bool| {
        let begun = onsets(times, on).into_iter();
        found.extend(begun.map(|time| Event { time, kind }));
    };
    let steering = match circuit.parts().priority_relief {
        PriorityRelief::Pilot(_) => EventKind::PilotCracked,
        PriorityRelief::None | PriorityRelief::OnPort(_) => EventKind::PriorityReliefCracked,
    };
    for (signal, kind) in [
        (Signal::MainReliefOpening, EventKind::MainReliefCracked),
        (Signal::PriorityReliefOpening, steering),
        (Signal::ExcessReliefOpening, EventKind::ExcessReliefCracked),
    ] {
        if let Some(opening) = trace.signal(signal) {
            watch(kind, &|row| opening.get(row) > CRACKED);
        }
    }
    if let Ok(x) = trace.named("x") {
        let stroke = circuit.parts().valve.stroke;
        watch(EventKind::SpoolAtStop, &|row| x.get(row) >= stroke);
    }
    if let (SteeringSide::Unit(gear), Ok(travel), Some(rate), Some(short)) = (
        &circuit.parts().steering,
        trace.named("y_c"),
        trace.signal(Signal::WheelRate),
        trace.signal(Signal::WheelShortfall),
    ) {
        let stroke = gear.cylinder.stroke;
        let locked = |row: usize| is_locked(rate.get(row), travel.get(row), stroke);
        watch(EventKind::SteeringAtLock, &locked);
        watch(EventKind::DropoutBegan, &|row| {
            let w = rate.get(row);
            w.abs() > FEELABLE && !locked(row) && short.get(row) / w > SHORT
        });
    }
    found.sort_by(|a, b| a.time.total_cmp(&b.time));
    found
}

/// The times at which a condition comes on after having been off for longer than [`QUIET`]. How
/// far apart the steps are while it stays on does not matter.
fn onsets(times: &[f64], on: &dyn Fn(usize) -> bool) -> Vec<f64> {
    let mut begun = Vec::new();
    let mut was_on = false;
    let mut last_on = f64::NEG_INFINITY;
    for (row, &time) in times.iter().enumerate() {
        let is_on = on(row);
        if is_on && !was_on && time - last_on > QUIET {
            begun.push(time);
        }
        if is_on {
            last_on = time;
        }
        was_on = is_on;
    }
    begun
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_condition_that_stays_on_over_long_steps_is_one_event() {
        let times = [0.0, 0.1, 0.2, 0.9, 1.6, 1.7, 1.71, 1.72, 2.5, 2.6];
        let on = [
            false, true, true, true, true, false, true, false, false, true,
        ];
        let begun = onsets(&times, &|row| on[row]);
        // Off for 0.11 s before 1.71 s and for 0.88 s before 2.6 s.
        assert_eq!(begun, [0.1, 1.71, 2.6], "each time it came on");
        let chatter = [0.0, 0.01, 0.02, 0.03, 0.04];
        assert_eq!(
            onsets(&chatter, &|row| row % 2 == 1),
            [0.01],
            "chatter is one event"
        );
    }
}
