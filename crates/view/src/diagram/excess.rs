//! The excess port, its relief, and what it feeds, other than a lift cylinder.

use helmsplit_model::{ExcessSide, HydraulicMotor, Quantity, Relief, Signal};

use super::context::Context;
use super::frame::{DOWN, Frame, RIGHT};
use super::lift;
use super::places::{CONSUMER_X, EXCESS_RELIEF, EXCESS_Y, RETURN_Y, VALVE};
use super::steering::BENCH_LENGTH;
use super::symbols::{CHECK, POSITION, RELIEF, THROTTLE, adjustable, plug, relief, tank, throttle};
use crate::scene::{Anchor, Part, PartPen};

/// Where a blocked port's line ends.
const PLUG_X: f64 = 664.0;

impl Context<'_> {
    pub(super) fn excess(&self, parts: &mut Vec<Part>) {
        let (end, foot) = self.excess_line_end();
        parts.push(self.excess_line(end, foot));
        if let Some(relief) = &self.parts.excess_relief {
            parts.push(self.excess_relief(relief));
        }
        match &self.parts.excess {
            ExcessSide::Tank { .. } => parts.push(self.excess_to_tank()),
            ExcessSide::Bench { .. } => parts.push(self.excess_bench()),
            ExcessSide::Motor(motor) => parts.push(self.excess_motor(motor)),
            ExcessSide::Lift(gear) => {
                parts.push(self.lift_cylinder(gear));
                parts.push(self.lift_valve(gear));
            }
            ExcessSide::Blocked => parts.push(blocked()),
        }
    }

    /// Where the line of the excess port turns down, and to which height.
    fn excess_line_end(&self) -> (f64, f64) {
        match self.parts.excess {
            ExcessSide::Tank { .. } => (CONSUMER_X, EXCESS_Y + 86.0),
            ExcessSide::Bench { .. } => (CONSUMER_X, EXCESS_Y + 56.0 - CHECK.0),
            ExcessSide::Motor(_) => (CONSUMER_X, EXCESS_Y + 56.0 - POSITION),
            ExcessSide::Lift(_) => (lift::SUPPLY_X, lift::SUPPLY_CHECK_Y - CHECK.0),
            ExcessSide::Blocked => (PLUG_X, EXCESS_Y),
        }
    }

    fn excess_line(&self, x: f64, foot: f64) -> Part {
        let mut pen = PartPen::new("excess_port", "Excess port");
        let stroke = self.working("p_e");
        pen.line(&[(VALVE.2, EXCESS_Y), (x, EXCESS_Y), (x, foot)], stroke);
        let place = (EXCESS_RELIEF.0 + 40.0, EXCESS_Y);
        self.arrow(&mut pen, place, RIGHT, Signal::ExcessOutFlow);
        let at = (VALVE.2 + 10.0, EXCESS_Y - 9.0);
        self.show_pressure(&mut pen, at, Anchor::Start, "p_e");
        let at = (EXCESS_RELIEF.0 + 26.0, EXCESS_Y - 11.0);
        self.show_signal(&mut pen, at, Anchor::Start, Signal::ExcessFlow);
        pen.done()
    }

    fn excess_relief(&self, of: &Relief) -> Part {
        let (x, y) = EXCESS_RELIEF;
        let mut pen = PartPen::new("excess_relief", "Excess relief");
        pen.line(&[(x, EXCESS_Y), (x, y - RELIEF)], self.working("p_e"));
        pen.line(&[(x, y + RELIEF), (x, RETURN_Y)], self.working("return"));
        pen.junction((x, EXCESS_Y));
        pen.junction((x, RETURN_Y));
        relief(
            &mut pen,
            &Frame::new(EXCESS_RELIEF, DOWN, RIGHT),
            self.pilot("p_e"),
        );
        self.arrow(&mut pen, (x, y + 60.0), DOWN, Signal::ExcessReliefFlow);
        let label = (x - 10.0, y + RELIEF + 86.0);
        pen.label(label, &self.cracking(of), Anchor::End);
        pen.done()
    }

    fn excess_to_tank(&self) -> Part {
        let (x, y) = (CONSUMER_X, EXCESS_Y + 86.0);
        let mut pen = PartPen::new("excess.tank", "Excess to tank");
        pen.line(&[(x, y), (x, RETURN_Y)], self.working("return"));
        let frame = Frame::new((x, y), DOWN, RIGHT);
        throttle(&mut pen, &frame);
        adjustable(&mut pen, &frame, 0.0, 0.0);
        pen.junction((x, RETURN_Y));
        self.arrow(&mut pen, (x, y + 50.0), DOWN, Signal::ExcessOutFlow);
        pen.label((x + 24.0, y), "orifice, by command", Anchor::Start);
        let below = (x + 24.0, y + THROTTLE + 20.0);
        self.show_signal(&mut pen, below, Anchor::Start, Signal::ExcessCommand);
        pen.done()
    }

    fn excess_bench(&self) -> Part {
        let (x, top) = (CONSUMER_X, EXCESS_Y + 56.0);
        let mut pen = PartPen::new("excess.bench", "Excess bench load");
        self.bench_column(&mut pen, (x, top), DOWN, "p_e", Signal::ExcessOutFlow);
        let foot = top + BENCH_LENGTH;
        let end = self.working("tank");
        pen.line(&[(x, foot - 12.0), (x, foot)], end);
        tank(&mut pen, (x, foot));
        let label = (x + 58.0, top + 108.0);
        pen.label(label, "throttle and loading valve", Anchor::Start);
        let below = (label.0, label.1 + 28.0);
        self.show_signal(&mut pen, below, Anchor::Start, Signal::ExcessBenchPressure);
        pen.done()
    }

    fn excess_motor(&self, machine: &HydraulicMotor) -> Part {
        let x = CONSUMER_X;
        let mut pen = PartPen::new("excess.motor", "Excess motor");
        self.hanging_motor(&mut pen, x, EXCESS_Y, RETURN_Y);
        self.arrow(&mut pen, (x, EXCESS_Y + 94.0), DOWN, Signal::MotorFlow);
        let label = (x + 98.0, EXCESS_Y + 176.0);
        pen.label(label, &self.per_turn(machine), Anchor::Start);
        let below = (label.0, label.1 + 28.0);
        let speed = ("w_m", Quantity::AngularVelocity);
        self.show_state(&mut pen, below, Anchor::Start, speed);
        let beside = (x + 9.0, EXCESS_Y + 118.0);
        self.show_pressure(&mut pen, beside, Anchor::Start, "p_m");
        pen.done()
    }
}

fn blocked() -> Part {
    let mut pen = PartPen::new("excess.blocked", "Blocked");
    plug(&mut pen, (PLUG_X, EXCESS_Y));
    pen.label((PLUG_X + 16.0, EXCESS_Y + 4.0), "", Anchor::Start);
    pen.done()
}
