//! Manoeuvre and start of the run.

use helmsplit_model::{Input, InputProfiles};

use crate::choice::{ChoiceId, ExcessKind, PrimeMoverKind, StartKind, SteeringKind};
use crate::finding::{Finding, Findings};
use crate::manoeuvre::{INPUTS, input_row};
use crate::parameter::manoeuvre;
use crate::scenario::Scenario;

/// Path of the state file in the circuit file.
pub(crate) const STATE_PATH: &str = "start.state";

impl Scenario {
    pub(super) fn check_manoeuvre(&self, out: &mut Findings) {
        let end = self.si(manoeuvre::DURATION);
        for (place, template) in self.manoeuvre.templates.iter().enumerate() {
            let Some(at) = template.value("at") else {
                continue;
            };
            if at.si() >= end {
                let message = format!(
                    "\"{}\" begins behind the end of the run at {}",
                    template.kind.key(),
                    self.value(manoeuvre::DURATION).text()
                );
                let path = format!("manoeuvre.templates[{place}].at");
                let hint = "begin earlier, or lengthen manoeuvre.duration";
                out.push(Finding::warning(path, message, hint).with_value(&at.text()));
            }
        }
        for row in INPUTS.iter().filter(|row| self.manoeuvre.moves(row.input)) {
            if !self.listens_to(row.input) {
                let message = format!(
                    "{} drives nothing in this circuit",
                    row.label.to_lowercase()
                );
                let hint = "leave it out, or choose the part that it drives";
                out.push(Finding::warning(row.path, message, hint));
            }
        }
        match self.manoeuvre.profiles() {
            Ok(profiles) => self.check_profiles(&profiles, end, out),
            Err(findings) => out.extend(findings),
        }
    }

    fn check_profiles(&self, profiles: &InputProfiles, end: f64, out: &mut Findings) {
        for row in &INPUTS {
            let points = profiles.get(row.input).points();
            let last = points.last().map_or(0.0, |point| point.0);
            if last > end {
                let message = format!(
                    "breakpoints go on until {last} s, behind the end of the run at {}",
                    self.value(manoeuvre::DURATION).text()
                );
                out.push(Finding::warning(
                    row.path,
                    message,
                    "lengthen manoeuvre.duration",
                ));
            }
        }
        // The governor works on the set speed relative to itself (M4.6).
        let speed = profiles.get(Input::EngineSpeed);
        let stands = speed.points().iter().any(|point| point.1 <= 0.0);
        if stands && self.chosen::<PrimeMoverKind>() == PrimeMoverKind::Governed {
            let path = input_row(Input::EngineSpeed).path;
            let message = "a governed engine needs a set speed above 0";
            let hint = "give a speed above 0, or choose a speed profile";
            out.push(Finding::error(path, message, hint));
        }
    }

    /// Whether an input acts on this circuit.
    #[must_use]
    pub fn listens_to(&self, input: Input) -> bool {
        let steering = self.chosen::<SteeringKind>();
        let excess = self.chosen::<ExcessKind>();
        match input {
            Input::EngineSpeed => true,
            Input::WheelRate | Input::ExternalForce => steering == SteeringKind::SteeringUnit,
            Input::BenchArea | Input::BenchPressure => steering == SteeringKind::BenchThrottle,
            Input::PriorityCommand => steering == SteeringKind::Motor,
            Input::ExcessPressure => excess == ExcessKind::BenchThrottle,
            Input::ExcessCommand => excess != ExcessKind::Blocked,
        }
    }

    pub(super) fn check_start(&self, out: &mut Findings) {
        let from_state = self.chosen::<StartKind>() == StartKind::FromState;
        if from_state && self.start_state.is_none() {
            let path = ChoiceId::StartKind.choice().path;
            let message = "the file of the state is not named";
            let hint = format!("add {STATE_PATH} with the name of a saved state");
            out.push(Finding::error(path, message, hint).with_value("from state"));
        }
    }
}
