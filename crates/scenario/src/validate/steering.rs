//! Steering unit and cylinders.

use helmsplit_model::{Quantity, smooth_step};

use super::shown;
use crate::choice::{ExcessKind, SteeringKind, TyreFriction};
use crate::finding::Findings;
use crate::parameter::{ParameterId, cylinder, lift, ratings, start, steering};
use crate::scenario::Scenario;

/// Drop at the set flow, Pa, above which the passage from neutral to steering chokes.
const CHOKING_DROP: f64 = 40e5;

impl Scenario {
    pub(super) fn check_steering(&self, out: &mut Findings) {
        if self.chosen::<SteeringKind>() != SteeringKind::SteeringUnit {
            return;
        }
        let why = "the neutral bypass would be shut before the edges open, and shut the pump off";
        self.must_lie_below(steering::DEAD_BAND, steering::BYPASS_SHUT, why, out);
        let why = "the edges would be fully open before they open";
        self.must_lie_below(steering::DEAD_BAND, steering::FULL_DEFLECTION, why, out);
        let why = "the wheel would be held before the edges open";
        self.must_lie_below(steering::DEAD_BAND, steering::STOP_DEFLECTION, why, out);
        if self.si(steering::STOP_BAND) > self.si(steering::STOP_DEFLECTION) {
            let message = format!(
                "the band is wider than the largest deflection ({})",
                self.value(steering::STOP_DEFLECTION).text()
            );
            out.push(self.finding_at(steering::STOP_BAND, &message, "make it narrower"));
        }
        self.check_passage(out);
        if self.chosen::<TyreFriction>() == TyreFriction::Bristle {
            self.check_bristle(cylinder::TYRE_FRICTION_FORCE, cylinder::TYRE_BREAKAWAY, out);
        }
    }

    /// While the bypass shuts and the edges open, the set flow must still find a way (M7.5).
    fn check_passage(&self, out: &mut Findings) {
        let s = |id: ParameterId| self.si(id);
        let (shut, dead, full) = (
            s(steering::BYPASS_SHUT),
            s(steering::DEAD_BAND),
            s(steering::FULL_DEFLECTION),
        );
        let (Ok(oil), true) = (self.oil(), dead < shut && dead < full) else {
            return;
        };
        let opening = |d: f64| {
            let bypass = s(steering::BYPASS_AREA) * (1.0 - smooth_step(d / shut))
                + s(steering::BYPASS_LEAK_AREA);
            let edges = s(steering::SUPPLY_AREA) * smooth_step((d - dead) / (full - dead));
            s(steering::BYPASS_DISCHARGE) * bypass + s(steering::EDGE_DISCHARGE) * edges
        };
        // The area is smooth between: a hundred places find its least well enough.
        let least = (0..=100)
            .map(|i| opening(shut * f64::from(i) / 100.0))
            .fold(f64::INFINITY, f64::min);
        let velocity = s(ratings::SET_FLOW) / least;
        let drop = 0.5 * oil.density * velocity * velocity;
        if drop > CHOKING_DROP {
            let message = format!(
                "the neutral bypass shuts long before the edges pass the surplus flow: between \
                 them the set flow costs {}",
                shown(drop, Quantity::Pressure, "bar")
            );
            let hint = "let the bypass shut later or the edges open earlier or wider";
            out.push(self.warning_at(steering::BYPASS_SHUT, &message, hint));
        }
    }

    pub(super) fn check_cylinders(&self, out: &mut Findings) {
        if self.uses(start::CYLINDER_POSITION) {
            self.check_position(start::CYLINDER_POSITION, cylinder::STROKE, out);
        }
        if self.uses(start::LIFT_POSITION) {
            self.check_position(start::LIFT_POSITION, lift::LIFT_STROKE, out);
        }
        if self.chosen::<ExcessKind>() == ExcessKind::LiftCylinder {
            let push = self.si(lift::LIFT_LOAD) / self.si(lift::LIFT_CAP_AREA);
            if let Some((limit, name)) = self.highest_excess_pressure()
                && push >= limit
            {
                let message = format!(
                    "the load alone needs {}, more than the {name} allows",
                    shown(push, Quantity::Pressure, "bar")
                );
                let hint = "give a larger cap area or a smaller load";
                out.push(self.warning_at(lift::LIFT_LOAD, &message, hint));
            }
        }
    }

    /// Travel counts from mid-stroke.
    fn check_position(&self, position: ParameterId, stroke: ParameterId, out: &mut Findings) {
        let half = 0.5 * self.si(stroke);
        if self.si(position).abs() > half {
            let half = shown(half, Quantity::Length, "mm");
            let message = format!(
                "the cylinder would stand beyond its stroke of {}",
                self.value(stroke).text()
            );
            let hint = format!("give -{half} to {half} from mid-stroke");
            out.push(self.finding_at(position, &message, &hint));
        }
    }

    /// Pressure to which reliefs limit the excess side, Pa, and which one.
    fn highest_excess_pressure(&self) -> Option<(f64, &'static str)> {
        use crate::choice::{ExcessReliefKind, MainReliefKind};
        use crate::parameter::{excess_relief, main_relief};
        if self.chosen::<ExcessReliefKind>() == ExcessReliefKind::Direct {
            Some((self.si(excess_relief::FULL_FLOW_PRESSURE), "excess relief"))
        } else if self.chosen::<MainReliefKind>() == MainReliefKind::Direct {
            Some((self.si(main_relief::FULL_FLOW_PRESSURE), "main relief"))
        } else {
            None
        }
    }
}
