//! Reliefs: each alone, and how they stand to each other.

use helmsplit_model::Quantity;

use super::shown;
use crate::choice::{
    ChoiceId, ExcessKind, ExcessReliefKind, MainReliefKind, PriorityReliefKind, ShockReliefs,
    SteeringKind,
};
use crate::finding::{Finding, Findings};
use crate::parameter::{
    ParameterId, excess_relief, limits, main_relief, priority_relief, steering, valve,
};
use crate::scenario::Scenario;

impl Scenario {
    pub(super) fn check_reliefs(&self, out: &mut Findings) {
        let main = self.chosen::<MainReliefKind>() == MainReliefKind::Direct;
        let excess = self.chosen::<ExcessReliefKind>() == ExcessReliefKind::Direct;
        let priority = self.chosen::<PriorityReliefKind>();
        let shock = self.chosen::<SteeringKind>() == SteeringKind::SteeringUnit
            && self.chosen::<ShockReliefs>() == ShockReliefs::Fitted;
        let pairs: [(bool, ParameterId, ParameterId); 4] = [
            (
                main,
                main_relief::CRACKING_PRESSURE,
                main_relief::FULL_FLOW_PRESSURE,
            ),
            (
                priority != PriorityReliefKind::None,
                priority_relief::CRACKING_PRESSURE,
                priority_relief::FULL_FLOW_PRESSURE,
            ),
            (
                excess,
                excess_relief::CRACKING_PRESSURE,
                excess_relief::FULL_FLOW_PRESSURE,
            ),
            (
                shock,
                steering::SHOCK_CRACKING_PRESSURE,
                steering::SHOCK_FULL_FLOW_PRESSURE,
            ),
        ];
        for (fitted, cracking, full) in pairs {
            if fitted {
                let why = "a relief passes its full flow above its cracking pressure";
                self.must_lie_below(cracking, full, why, out);
            }
        }
        self.check_unrelieved(main, excess, priority, out);
        if priority != PriorityReliefKind::None && main {
            self.check_steering_limit(out);
        }
        if priority == PriorityReliefKind::Pilot {
            self.check_pilot(main, excess, out);
        }
    }

    fn check_unrelieved(
        &self,
        main: bool,
        excess: bool,
        priority: PriorityReliefKind,
        out: &mut Findings,
    ) {
        if main {
            return;
        }
        let hint = "fit a main relief";
        let message = if excess {
            return;
        } else if priority == PriorityReliefKind::None {
            "there is no relief at all: whatever blocks bursts the circuit"
        } else {
            "no relief limits pump and excess side: a blocked consumer bursts the circuit"
        };
        let id = ChoiceId::MainReliefKind;
        let finding = Finding::warning(id.choice().path, message, hint);
        out.push(finding.with_value(self.option_key(id)));
    }

    /// The priority relief must take its full flow before the main relief opens, else the lock
    /// stops the consumers. How far apart they must lie is the check's business.
    fn check_steering_limit(&self, out: &mut Findings) {
        let drop = self.si(valve::SPRING_PRELOAD) / self.end_area();
        let top = self.si(priority_relief::FULL_FLOW_PRESSURE) + drop;
        if top > self.si(main_relief::CRACKING_PRESSURE) {
            let message = format!(
                "with the spring's drop the inlet needs {} at the lock, and the main relief cracks \
                 at {}: consumers stop when the steering is held at the lock",
                shown(top, Quantity::Pressure, "bar"),
                self.value(main_relief::CRACKING_PRESSURE).text()
            );
            let hint = "lower the priority relief; never raise a relief beyond the ratings";
            out.push(self.warning_at(priority_relief::FULL_FLOW_PRESSURE, &message, hint));
        }
    }

    /// A pilot on the spring chamber loses the steering once the excess side runs above it.
    fn check_pilot(&self, main: bool, excess: bool, out: &mut Findings) {
        if self.chosen::<ExcessKind>() == ExcessKind::Tank {
            return;
        }
        let highest = [
            (main, main_relief::FULL_FLOW_PRESSURE),
            (excess, excess_relief::FULL_FLOW_PRESSURE),
        ]
        .into_iter()
        .filter(|(fitted, _)| *fitted)
        .map(|(_, id)| self.si(id))
        .fold(f64::INFINITY, f64::min);
        let clearance = self.si(limits::PILOT_CLEARANCE);
        if highest + clearance > self.si(priority_relief::CRACKING_PRESSURE) {
            let reach = if highest.is_finite() {
                shown(highest, Quantity::Pressure, "bar")
            } else {
                "any pressure".to_owned()
            };
            let message = format!(
                "the excess side can reach {reach}; above the pilot's cracking pressure the spool \
                 shuts the priority holes and the steering is lost"
            );
            let hint = format!(
                "keep the excess side {} below the pilot, or put the relief on the priority port",
                self.value(limits::PILOT_CLEARANCE).text()
            );
            out.push(self.warning_at(priority_relief::CRACKING_PRESSURE, &message, &hint));
        }
    }
}
