//! What the priority port feeds, other than a steering unit: a bench throttle or a motor. The
//! symbols of both also serve the excess side.

use helmsplit_model::{HydraulicMotor, Quantity, Signal, SteeringSide};
use std::f64::consts::TAU;

use super::context::Context;
use super::frame::{DOWN, Frame, LEFT, RIGHT, UP};
use super::places::{PRIORITY_X, RISER_STUB, RISER_X};
use super::symbols::{
    CHECK, MACHINE, POSITION, RELIEF, SPRING, adjustable, check, load, motor, on_off, relief,
    shaft, tank, throttle,
};
use crate::scene::{Anchor, Part, PartPen};

/// Top of the riser with a motor on the priority port.
const MOTOR_RETURN_Y: f64 = 112.0;

impl Context<'_> {
    pub(super) fn steering(&self, parts: &mut Vec<Part>) {
        match &self.parts.steering {
            SteeringSide::Bench(_) => {
                parts.push(self.priority_line(299.0));
                parts.push(self.priority_bench());
            }
            SteeringSide::Unit(gear) => {
                parts.push(self.priority_line(286.0));
                parts.push(self.steering_cylinder(gear));
                parts.push(self.steering_unit(gear));
            }
            SteeringSide::Motor(motor) => {
                parts.push(self.priority_line(270.0 + POSITION));
                parts.push(self.priority_motor(motor));
            }
        }
    }

    /// Top of the return line on the left, if anything needs it.
    pub(super) fn riser_top(&self) -> Option<f64> {
        let relief = match self.parts.priority_relief {
            helmsplit_model::PriorityRelief::None => None,
            helmsplit_model::PriorityRelief::OnPort(_) => Some(super::places::PRIORITY_RELIEF_Y),
            helmsplit_model::PriorityRelief::Pilot(_) => Some(super::places::PILOT_Y),
        };
        match self.parts.steering {
            SteeringSide::Bench(_) => relief,
            SteeringSide::Unit(_) => Some(super::steering_unit::RETURN_Y),
            SteeringSide::Motor(_) => Some(MOTOR_RETURN_Y),
        }
    }

    fn priority_bench(&self) -> Part {
        let x = PRIORITY_X;
        let mut pen = PartPen::new("steering.bench", "Priority bench load");
        self.bench_column(&mut pen, (x, 290.0), UP, "p_su", Signal::BenchFlow);
        let over = 290.0 - BENCH_LENGTH;
        let tank_x = x + 74.0;
        let back = self.working("tank");
        pen.line(
            &[
                (x, over + 12.0),
                (x, over),
                (tank_x, over),
                (tank_x, over + 36.0),
            ],
            back,
        );
        tank(&mut pen, (tank_x, over + 36.0));
        let label = (tank_x + 26.0, over + 28.0);
        pen.label(label, "throttle and loading valve", Anchor::Start);
        let below = (label.0, label.1 + 28.0);
        self.show_signal(&mut pen, below, Anchor::Start, Signal::BenchPressure);
        pen.done()
    }

    /// Check, throttle and loading relief, one behind the other along `flow`, from the centre of
    /// the check; the last line ends short of `BENCH_LENGTH`.
    pub(super) fn bench_column(
        &self,
        pen: &mut PartPen,
        start: (f64, f64),
        flow: kurbo::Vec2,
        pressure: &str,
        signal: Signal,
    ) {
        let frame = Frame::new(start, flow, RIGHT);
        let (through, loading) = (frame.moved(52.0, 0.0), frame.moved(112.0, 0.0));
        let ahead = self.working(pressure);
        let behind = self.bench_stroke(signal);
        pen.line(&frame.all([(CHECK.1, 0.0), (52.0, 0.0)]), ahead);
        pen.line(&frame.all([(52.0, 0.0), (112.0 - RELIEF, 0.0)]), behind);
        pen.line(
            &frame.all([(112.0 + RELIEF, 0.0), (BENCH_LENGTH - 12.0, 0.0)]),
            self.working("tank"),
        );
        check(pen, &frame);
        throttle(pen, &through);
        adjustable(pen, &through, 0.0, 0.0);
        let pilot = crate::scene::Stroke {
            line: crate::scene::Line::Pilot,
            ..behind
        };
        relief(pen, &loading, pilot);
        adjustable(pen, &loading, 0.0, RELIEF + 0.5 * SPRING);
        self.arrow(pen, frame.at(74.0, 0.0), flow, signal);
    }

    /// The line between throttle and loading valve: under the pressure that the bench sets.
    fn bench_stroke(&self, signal: Signal) -> crate::scene::Stroke {
        let set = match signal {
            Signal::BenchFlow => Signal::BenchPressure,
            _ => Signal::ExcessBenchPressure,
        };
        let pressure = self.moment.and_then(|moment| moment.signal(set));
        crate::scene::Stroke {
            line: crate::scene::Line::Working,
            oil: pressure.map(|pressure| self.scale.share(pressure)),
        }
    }

    fn priority_motor(&self, machine: &HydraulicMotor) -> Part {
        let x = PRIORITY_X;
        let (valve_y, y, top) = (270.0, 172.0, MOTOR_RETURN_Y);
        let mut pen = PartPen::new("steering.motor", "Priority motor");
        let (inside, back) = (self.working("p_pm"), self.working("return"));
        let branch = x + 76.0;
        pen.line(&[(x, valve_y - POSITION), (x, y + MACHINE)], inside);
        pen.line(
            &[(x, y - MACHINE), (x, top), (RISER_X + RISER_STUB, top)],
            back,
        );
        let centre = (branch, y - 6.0);
        pen.line(
            &[(x, top), (branch, top), (branch, centre.1 - CHECK.0)],
            back,
        );
        let low = 222.0;
        pen.line(
            &[(branch, centre.1 + CHECK.1), (branch, low), (x, low)],
            inside,
        );
        pen.junction((x, top));
        pen.junction((x, low));
        check(&mut pen, &Frame::new(centre, DOWN, RIGHT));
        on_off(&mut pen, &Frame::new((x, valve_y), UP, RIGHT));
        motor(&mut pen, &Frame::new((x, y), UP, RIGHT));
        shaft(&mut pen, (x - MACHINE, y), x - 72.0);
        load(&mut pen, (x - 87.0, y));
        self.arrow(&mut pen, (x, y - 42.0), UP, Signal::PriorityMotorFlow);
        let label = (branch + 20.0, y - 12.0);
        pen.label(label, &self.per_turn(machine), Anchor::Start);
        let below = (label.0, label.1 + 30.0);
        let speed = ("w_pm", Quantity::AngularVelocity);
        self.show_state(&mut pen, below, Anchor::Start, speed);
        pen.done()
    }

    /// Displacement of a motor for its label.
    pub(super) fn per_turn(&self, machine: &HydraulicMotor) -> String {
        let displacement = machine.displacement_rad * TAU;
        format!("{}/rev", self.size(displacement, Quantity::Volume))
    }

    /// A motor with its valve, load and check, hanging below a line; for the excess side.
    pub(super) fn hanging_motor(&self, pen: &mut PartPen, x: f64, top: f64, foot: f64) {
        let (valve_y, y) = (top + 56.0, top + 182.0);
        let branch = x - 66.0;
        let (inside, back) = (self.working("p_m"), self.working("return"));
        pen.line(&[(x, valve_y + POSITION), (x, y - MACHINE)], inside);
        pen.line(&[(x, y + MACHINE), (x, foot)], back);
        let (high, low) = (top + 128.0, top + 258.0);
        let centre = (branch, y + 12.0);
        pen.line(
            &[(x, low), (branch, low), (branch, centre.1 + CHECK.0)],
            back,
        );
        pen.line(
            &[(branch, centre.1 - CHECK.1), (branch, high), (x, high)],
            inside,
        );
        for y in [high, low, foot] {
            pen.junction((x, y));
        }
        check(pen, &Frame::new(centre, UP, LEFT));
        on_off(pen, &Frame::new((x, valve_y), DOWN, RIGHT));
        motor(pen, &Frame::new((x, y), DOWN, RIGHT));
        shaft(pen, (x + MACHINE, y), x + 58.0);
        load(pen, (x + 73.0, y));
    }
}

/// From the centre of a bench's check valve to its end.
pub(super) const BENCH_LENGTH: f64 = 154.0;
