//! A lift cylinder behind its directional valve.

use helmsplit_model::{LiftGear, Quantity, Signal};
use kurbo::{Rect, Shape};

use super::context::Context;
use super::frame::{DOWN, Frame, LEFT, RIGHT, UP};
use super::places::{LIFT_X, RETURN_Y};
use super::symbols::{CHECK, POSITION, check, position, shut, solenoid};
use crate::scene::{Anchor, Line, Paint, Part, PartPen, Stroke};

/// The supply comes down here, through the load-holding check.
pub(super) const SUPPLY_X: f64 = 684.0;
pub(super) const SUPPLY_CHECK_Y: f64 = 470.0;

/// Ports stand so far beside the middle of a position.
const PORT: f64 = 10.0;

/// Middle of the directional valve.
const VALVE_Y: f64 = 490.0;

/// Height of the line under the valve.
const SUPPLY_Y: f64 = 560.0;

/// Line to the rod end, and the return line of the checks.
const ROD_X: f64 = 862.0;
const RAIL_X: f64 = 908.0;

/// Heights of the checks of cap end and rod end.
const CHECKS: (f64, f64) = (354.0, 406.0);

/// The check of the cap end.
const CAP_CHECK_X: f64 = 816.0;

/// The cylinder: left, top, right, foot.
const CYLINDER: (f64, f64, f64, f64) = (788.0, 170.0, 830.0, 332.0);

/// Largest shift of the piston on the sheet.
const SHIFT: f64 = 52.0;

impl Context<'_> {
    pub(super) fn lift_valve(&self, gear: &LiftGear) -> Part {
        let mut pen = PartPen::new("excess.lift_valve", "Lift valve");
        let (feed, drain) = (LIFT_X - PORT, LIFT_X + PORT);
        let low = VALVE_Y + POSITION;
        let supply = self.working("p_e");
        pen.line(
            &[
                (SUPPLY_X, SUPPLY_CHECK_Y + CHECK.1),
                (SUPPLY_X, SUPPLY_Y),
                (feed, SUPPLY_Y),
                (feed, low),
            ],
            supply,
        );
        check(
            &mut pen,
            &Frame::new((SUPPLY_X, SUPPLY_CHECK_Y), DOWN, RIGHT),
        );
        self.lift_returns(&mut pen, drain, low);
        let neutral = Frame::new((LIFT_X, VALVE_Y), UP, RIGHT);
        lift_positions(&mut pen, &neutral, gear.neutral_area > 0.0);
        let label = (LIFT_X + 22.0, SUPPLY_Y - 20.0);
        pen.label(label, "", Anchor::Start);
        let below = (label.0, label.1 + 14.0);
        self.show_signal(&mut pen, below, Anchor::Start, Signal::ExcessCommand);
        pen.done()
    }

    fn lift_returns(&self, pen: &mut PartPen, drain: f64, low: f64) {
        let back = self.working("return");
        let branch = 610.0;
        pen.line(&[(drain, low), (drain, RETURN_Y)], back);
        pen.line(
            &[
                (drain, branch),
                (RAIL_X, branch),
                (RAIL_X, CHECKS.0),
                (CAP_CHECK_X + CHECK.0, CHECKS.0),
            ],
            back,
        );
        pen.junction((drain, branch));
        pen.junction((drain, RETURN_Y));
        let cap_x = LIFT_X - PORT;
        for (y, line, at, pressure) in [
            (CHECKS.0, cap_x, CAP_CHECK_X, "p_cap"),
            (CHECKS.1, ROD_X, RAIL_X - 16.0, "p_rod"),
        ] {
            let frame = Frame::new((at, y), LEFT, UP);
            if y > CHECKS.0 {
                pen.line(&[(RAIL_X, y), frame.at(-CHECK.0, 0.0)], back);
            }
            let stroke = self.working(pressure);
            pen.line(&[frame.at(CHECK.1, 0.0), (line, y)], stroke);
            check(pen, &frame);
            pen.junction((line, y));
        }
        pen.junction((RAIL_X, CHECKS.1));
    }

    pub(super) fn lift_cylinder(&self, gear: &LiftGear) -> Part {
        let mut pen = PartPen::new("excess.lift", "Lift cylinder");
        let (left, top, right, foot) = CYLINDER;
        let (cap_x, rod_x) = (LIFT_X - PORT, LIFT_X + PORT);
        let high = VALVE_Y - POSITION;
        let cap = self.working("p_cap");
        pen.line(
            &[(cap_x, high), (cap_x, foot - 12.0), (left, foot - 12.0)],
            cap,
        );
        let turn = high - 28.0;
        let rod_end = self.working("p_rod");
        pen.line(
            &[
                (rod_x, high),
                (rod_x, turn),
                (ROD_X, turn),
                (ROD_X, top + 12.0),
                (right, top + 12.0),
            ],
            rod_end,
        );
        let travel = self.moment.and_then(|moment| moment.state("y_l"));
        let travel = travel.unwrap_or(gear.start);
        let share = (2.0 * travel / gear.cylinder.stroke).clamp(-1.0, 1.0);
        let piston = 0.5 * (top + foot) - SHIFT * share;
        let chamber = |name| Paint::Oil(self.pressure(name).map(|p| self.scale.share(p)));
        pen.block(Rect::new(left, top, right, piston), chamber("p_rod"));
        pen.block(Rect::new(left, piston, right, foot), chamber("p_cap"));
        let x = 0.5 * (left + right);
        let end = piston - 146.0;
        pen.frame(Rect::new(x - 4.0, end, x + 4.0, piston));
        let frame = Rect::new(left, top, right, foot).to_path(0.1);
        pen.path(frame, Some(Stroke::plain(Line::Symbol)), None);
        pen.frame(Rect::new(left, piston - 4.0, right, piston + 4.0));
        pen.frame(Rect::new(x - 26.0, end - 24.0, x + 26.0, end));
        let at = (cap_x - 10.0, 0.5 * (top + foot));
        let load = self.size(gear.load, Quantity::Force);
        pen.label(at, &format!("load {load}"), Anchor::End);
        let beside = (cap_x - 8.0, 430.0);
        self.show_pressure(&mut pen, beside, Anchor::End, "p_cap");
        self.arrow(&mut pen, (cap_x, 394.0), UP, Signal::LiftFlow);
        pen.done()
    }
}

/// Lift, neutral, lower; solenoids at both ends.
fn lift_positions(pen: &mut PartPen, neutral: &Frame, open_centre: bool) {
    position(pen, neutral);
    if open_centre {
        pen.symbol(&neutral.all([
            (-POSITION, -PORT),
            (-POSITION + 11.0, -PORT),
            (-POSITION + 11.0, PORT),
            (-POSITION, PORT),
        ]));
    } else {
        shut(pen, neutral, -POSITION, -PORT);
        shut(pen, neutral, -POSITION, PORT);
    }
    shut(pen, neutral, POSITION, -PORT);
    shut(pen, neutral, POSITION, PORT);
    let lift = neutral.moved(0.0, -2.0 * POSITION);
    position(pen, &lift);
    pen.arrow(lift.at(-POSITION, -PORT), lift.at(POSITION, -PORT));
    pen.arrow(lift.at(POSITION, PORT), lift.at(-POSITION, PORT));
    let lower = neutral.moved(0.0, 2.0 * POSITION);
    position(pen, &lower);
    pen.arrow(lower.at(-POSITION, -PORT), lower.at(POSITION, PORT));
    pen.arrow(lower.at(POSITION, -PORT), lower.at(-POSITION, PORT));
    solenoid(pen, neutral, -3.0 * POSITION, -1.0);
    solenoid(pen, neutral, 3.0 * POSITION, 1.0);
    for along in [-POSITION - 4.0, POSITION + 4.0] {
        pen.symbol(&neutral.all([(along, -3.0 * POSITION), (along, 3.0 * POSITION)]));
    }
}
