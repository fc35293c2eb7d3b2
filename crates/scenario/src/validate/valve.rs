//! Geometry of the valve.

use std::f64::consts::FRAC_PI_4;

use helmsplit_model::Quantity;

use super::shown;
use crate::choice::{ValveFriction, ValveLand};
use crate::finding::Findings;
use crate::parameter::{ParameterId, ratings, valve, valve_edges};
use crate::scenario::Scenario;

/// Share by which orifice and spring may miss the stated priority flow before it is doubtful.
const FLOW_DOUBT: f64 = 0.25;

impl Scenario {
    pub(super) fn check_valve(&self, out: &mut Findings) {
        self.check_spring_chamber(out);
        self.check_land(out);
        self.check_holes(out);
        self.check_friction(out);
        self.check_set_flow(out);
    }

    /// Area of the spool's end, m2.
    pub(super) fn end_area(&self) -> f64 {
        FRAC_PI_4 * self.si(valve::SPOOL_DIAMETER).powi(2)
    }

    /// The spring chamber must hold what the spool sweeps (M5.11).
    fn check_spring_chamber(&self, out: &mut Findings) {
        let swept = self.end_area() * self.si(valve::STROKE);
        if self.si(valve::SPRING_VOLUME) <= swept {
            let swept = shown(swept, Quantity::Volume, "cm3");
            let message = format!(
                "the spool sweeps {swept} over its stroke of {}, and the spring chamber does not \
                 hold that",
                self.value(valve::STROKE).text()
            );
            let hint = format!("give more than {swept}, or a shorter stroke");
            out.push(self.finding_at(valve::SPRING_VOLUME, &message, &hint));
        }
    }

    fn check_land(&self, out: &mut Findings) {
        let why = "the excess land would never open";
        self.must_lie_below(valve::OVERLAP, valve::STROKE, why, out);
        match self.chosen::<ValveLand>() {
            ValveLand::Chamfer => {
                let why = "the chamfer is longer than the stroke";
                self.must_lie_below(valve::CHAMFER_LENGTH, valve::STROKE, why, out);
            }
            ValveLand::Notches => {
                let why = "the notches are longer than the stroke";
                self.must_lie_below(valve::NOTCH_LENGTH, valve::STROKE, why, out);
            }
            ValveLand::RoundHoles => {
                let why = "the holes of the land are wider than the spool";
                self.must_lie_below(valve::LAND_HOLE_DIAMETER, valve::SPOOL_DIAMETER, why, out);
            }
            ValveLand::Table => {
                if let Err(finding) = self.land_table.curve() {
                    out.push(finding);
                }
            }
            ValveLand::SharpEdge => {}
        }
    }

    fn check_holes(&self, out: &mut Findings) {
        let why = "the priority holes would shut before they are throttled";
        let (start, end) = (
            valve_edges::HOLES_THROTTLE_START,
            valve_edges::HOLES_THROTTLE_END,
        );
        self.must_lie_below(start, end, why, out);
        let why = "the priority holes would leak more than they pass";
        let (leak, open) = (valve_edges::HOLES_LEAK_AREA, valve_edges::HOLES_OPEN_AREA);
        self.must_lie_below(leak, open, why, out);
        if self.si(start) < self.si(valve::OVERLAP) && self.si(end) > self.si(start) {
            let message = format!(
                "the steering is throttled before the excess land opens at {}",
                self.value(valve::OVERLAP).text()
            );
            out.push(self.warning_at(start, &message, "let throttling start beyond the overlap"));
        }
        let bores: [(ParameterId, &str); 3] = [
            (
                valve_edges::FIXED_ORIFICE_DIAMETER,
                "the fixed orifice is wider than the spool",
            ),
            (
                valve_edges::HEAD_HOLE_DIAMETER,
                "the head hole is wider than the spool",
            ),
            (
                valve_edges::DISC_HOLE_DIAMETER,
                "the disc hole is wider than the spool",
            ),
        ];
        for (id, why) in bores {
            self.must_lie_below(id, valve::SPOOL_DIAMETER, why, out);
        }
    }

    fn check_friction(&self, out: &mut Findings) {
        if self.chosen::<ValveFriction>() == ValveFriction::Bristle {
            self.check_bristle(valve::COULOMB_FRICTION, valve::BREAKAWAY_FRICTION, out);
        }
    }

    /// The bristle law divides by the Coulomb force and needs at least that to break away.
    pub(super) fn check_bristle(
        &self,
        coulomb: ParameterId,
        breakaway: ParameterId,
        out: &mut Findings,
    ) {
        if self.si(coulomb) <= 0.0 {
            let message = "bristle friction needs a force above 0";
            out.push(self.finding_at(coulomb, message, "choose smooth friction for none"));
        }
        if self.si(breakaway) < self.si(coulomb) {
            let message = format!(
                "sliding friction ({}) is larger than what sets it sliding",
                self.value(coulomb).text()
            );
            let hint = format!("give {} or more", self.value(coulomb).text());
            out.push(self.finding_at(breakaway, &message, &hint));
        }
    }

    /// Orifice and spring against the flow that the valve is made for (M5.1, M5.9).
    fn check_set_flow(&self, out: &mut Findings) {
        let Ok(oil) = self.oil() else {
            return;
        };
        let opening = self.si(valve::OVERLAP).max(0.0);
        let force = self.si(valve::SPRING_PRELOAD) + self.si(valve::SPRING_RATE) * opening;
        let flow = self.fixed_orifice().flow(&oil, force / self.end_area());
        let stated = self.si(ratings::SET_FLOW);
        if (flow / stated - 1.0).abs() > FLOW_DOUBT {
            let message = format!(
                "orifice and spring give about {} with this oil when the land opens",
                shown(flow, Quantity::Flow, "L/min")
            );
            let hint = "correct the set flow, the fixed orifice or the preload";
            out.push(self.warning_at(ratings::SET_FLOW, &message, hint));
        }
    }
}
