//! The verdict table of one run.

mod hardware;
mod response;
mod steering;

use helmsplit_model::{Circuit, InputProfiles, Signal};
use helmsplit_scenario::{Limits, Ratings, Scenario};
use helmsplit_sim::{RunResult, Trace};

use crate::check::{Check, CheckId};

/// What every check looks at.
pub(crate) struct Subject<'a> {
    pub(crate) circuit: &'a Circuit,
    pub(crate) inputs: &'a InputProfiles,
    pub(crate) run: &'a RunResult,
    pub(crate) limits: Limits,
    pub(crate) ratings: Ratings,
}

impl Subject<'_> {
    pub(crate) fn trace(&self) -> &Trace {
        &self.run.trace
    }

    pub(crate) fn times(&self) -> &[f64] {
        self.run.trace.steps().times()
    }

    /// A signal on the solver's steps, copied; `None` if the circuit has no such part.
    pub(crate) fn signal(&self, signal: Signal) -> Option<Vec<f64>> {
        self.trace().signal(signal).map(|c| c.to_vec())
    }

    /// Largest value of a state or signal by its short name, with its time (s).
    pub(crate) fn largest(&self, name: &str) -> Option<(f64, f64)> {
        let position = self.trace().position(name)?;
        let extreme = self.trace().extreme(position)?;
        Some((extreme.max, extreme.max_time))
    }
}

/// What an empty run can say.
const EMPTY: &str = "the run has no steps to look at";

/// Every check of design, in order, as far as one run can answer it. A run that ended early is
/// judged by what it has.
#[must_use]
pub fn check_run(
    scenario: &Scenario,
    circuit: &Circuit,
    inputs: &InputProfiles,
    run: &RunResult,
) -> Vec<Check> {
    let subject = Subject {
        circuit,
        inputs,
        run,
        limits: scenario.limits(),
        ratings: scenario.ratings(),
    };
    let (overshoot, settling) = response::checks(&subject);
    let one = |id: CheckId| match id {
        CheckId::PriorityAtIdle
        | CheckId::Regulation
        | CheckId::Damping
        | CheckId::StrokeReserve
        | CheckId::RippleClearance => Check::needs_map(id),
        CheckId::Overshoot => overshoot.clone(),
        CheckId::Settling => settling.clone(),
        CheckId::Dropout => steering::dropout(&subject),
        CheckId::SteeringLimit => hardware::steering_limit(&subject),
        CheckId::ConsumerAtLock => steering::consumer_at_lock(&subject),
        CheckId::PilotClearance => hardware::pilot_clearance(&subject),
        CheckId::PeakPressure => hardware::peak_pressure(&subject),
        CheckId::LineVelocity => hardware::line_velocity(&subject),
        CheckId::ViscosityWindow => hardware::viscosity_window(&subject),
        CheckId::Heat => hardware::heat(&subject),
        CheckId::Audit => hardware::audit(&subject),
    };
    CheckId::ALL
        .into_iter()
        .map(|id| {
            let takes_trace = !matches!(
                id,
                CheckId::SteeringLimit | CheckId::ViscosityWindow | CheckId::Audit
            );
            if takes_trace && subject.trace().steps().is_empty() {
                Check::not_applicable(id, EMPTY)
            } else {
                one(id)
            }
        })
        .collect()
}
