//! The priority valve as one body, and the relief of the steering side.

use helmsplit_model::{PriorityRelief, Quantity, Relief, Signal};
use kurbo::{Rect, Shape};

use super::context::Context;
use super::frame::{Frame, LEFT, RIGHT, UP};
use super::places::{
    EXCESS_Y, INLET_Y, PILOT_Y, PRIORITY_RELIEF_X, PRIORITY_RELIEF_Y, PRIORITY_X, RISER_STUB,
    RISER_X, VALVE,
};
use super::symbols::{
    POSITION, RELIEF, damping_hole, orifice, position, relief, shut, side_spring,
};
use crate::scene::{Anchor, Line, Part, PartPen, Stroke, Tone};
use crate::style::TextSize;

/// Ports stand so far beside the middle of a position.
const PORT: f64 = 10.0;

/// Height of the middle of the positions.
const MIDDLE_Y: f64 = 426.0;

/// The pilot line of the spring end, left of the spring.
const SPRING_PILOT_X: f64 = 356.0;

/// The pilot line of the head end.
const HEAD_PILOT_X: f64 = 500.0;

impl Context<'_> {
    pub(super) fn valve(&self, parts: &mut Vec<Part>) {
        parts.push(self.priority_valve());
    }

    /// After the lines, so that its dots lie upon them.
    pub(super) fn priority_relief(&self, parts: &mut Vec<Part>) {
        match &self.parts.priority_relief {
            PriorityRelief::None => {}
            PriorityRelief::OnPort(relief) => parts.push(self.port_relief(relief)),
            PriorityRelief::Pilot(relief) => parts.push(self.pilot_relief(relief)),
        }
    }

    fn priority_valve(&self) -> Part {
        let mut pen = PartPen::new("valve", "Priority valve");
        let (left, top, right, foot) = VALVE;
        let envelope = Rect::new(left, top, right, foot).to_path(0.1);
        pen.path(envelope, Some(Stroke::plain(Line::Envelope)), None);
        let rest = Frame::new((PRIORITY_X + PORT, MIDDLE_Y), UP, RIGHT);
        let inlet_x = PRIORITY_X + 2.0 * PORT;
        let (lower, upper) = (MIDDLE_Y + POSITION, MIDDLE_Y - POSITION);
        self.valve_pilots(&mut pen, inlet_x, lower);
        // Oil through the fixed orifice, and oil straight to the excess land.
        let orifice_y = INLET_Y - 16.0;
        pen.line(
            &[(PRIORITY_X, INLET_Y), (PRIORITY_X, orifice_y)],
            self.working("p_in"),
        );
        pen.line(
            &[(PRIORITY_X, orifice_y), (PRIORITY_X, lower)],
            self.working("p_b"),
        );
        orifice(&mut pen, &Frame::new((PRIORITY_X, orifice_y), UP, RIGHT));
        self.inlet_inside(&mut pen, inlet_x, lower);
        pen.line(
            &[(PRIORITY_X, upper), (PRIORITY_X, top)],
            self.working("p_c"),
        );
        pen.line(
            &[(inlet_x, upper), (inlet_x, EXCESS_Y), (right, EXCESS_Y)],
            self.working("p_e"),
        );
        valve_positions(&mut pen, &rest);
        pen.junction((PRIORITY_X, 464.0));
        pen.junction((inlet_x, 474.0));
        self.valve_texts(&mut pen);
        pen.done()
    }

    fn valve_pilots(&self, pen: &mut PartPen, inlet_x: f64, lower: f64) {
        let spring_end = self.pilot("p_s");
        let x = SPRING_PILOT_X;
        let (tap, end) = (464.0, PILOT_Y);
        let hole = (374.0, tap);
        pen.line(&[(PRIORITY_X, tap), hole], self.pilot("p_b"));
        pen.line(
            &[
                hole,
                (x, tap),
                (x, end),
                (PRIORITY_X + PORT - POSITION, end),
            ],
            spring_end,
        );
        damping_hole(pen, &Frame::new(hole, LEFT, UP));
        let (tap, hole) = (lower + 28.0, (460.0, lower + 28.0));
        pen.line(&[(inlet_x, tap), hole], self.pilot("p_in"));
        pen.line(
            &[
                hole,
                (HEAD_PILOT_X, tap),
                (HEAD_PILOT_X, MIDDLE_Y),
                (PRIORITY_X + PORT + 3.0 * POSITION, MIDDLE_Y),
            ],
            self.pilot("p_h"),
        );
        damping_hole(pen, &Frame::new(hole, RIGHT, UP));
    }

    fn valve_texts(&self, pen: &mut PartPen) {
        let at = (VALVE.0 + 4.0, VALVE.3 + 16.0);
        let detail = match self.moment {
            Some(moment) if self.options.values => {
                let travel = self.text(moment.travel(), Quantity::Length);
                let stroke = self.size(self.parts.valve.stroke, Quantity::Length);
                format!("spool at {travel} of {stroke}")
            }
            _ => {
                let margin = self.parts.valve.preload / self.parts.valve.end_area();
                format!(
                    "margin at preload {}",
                    self.text(margin, Quantity::Pressure)
                )
            }
        };
        pen.label(at, &detail, Anchor::Start);
        self.arrow(pen, (PRIORITY_X, 384.0), UP, Signal::PriorityFlow);
        self.arrow(pen, (452.0, EXCESS_Y), RIGHT, Signal::ExcessFlow);
    }

    fn port_relief(&self, of: &Relief) -> Part {
        let mut pen = PartPen::new("priority_relief", "Priority relief");
        let y = PRIORITY_RELIEF_Y;
        let centre = (PRIORITY_RELIEF_X, y);
        let stroke = self.working("p_c");
        pen.line(&[(PRIORITY_X, y), (centre.0 + RELIEF, y)], stroke);
        self.to_riser(&mut pen, (centre.0 - RELIEF, y));
        pen.junction((PRIORITY_X, y));
        relief(&mut pen, &Frame::new(centre, LEFT, UP), self.pilot("p_c"));
        self.arrow(&mut pen, (120.0, y), LEFT, Signal::PriorityReliefFlow);
        let label = (centre.0 - RELIEF - 8.0, y + 18.0);
        pen.label(label, &self.cracking(of), Anchor::End);
        pen.done()
    }

    fn pilot_relief(&self, of: &Relief) -> Part {
        let mut pen = PartPen::new("priority_relief", "Pilot relief");
        let y = PILOT_Y;
        let centre = (PRIORITY_RELIEF_X, y);
        pen.line(
            &[(SPRING_PILOT_X, y), (centre.0 + RELIEF, y)],
            self.pilot("p_s"),
        );
        self.to_riser(&mut pen, (centre.0 - RELIEF, y));
        pen.junction((SPRING_PILOT_X, y));
        relief(&mut pen, &Frame::new(centre, LEFT, UP), self.pilot("p_s"));
        self.arrow(&mut pen, (120.0, y), LEFT, Signal::PilotReliefFlow);
        let label = (centre.0 - RELIEF - 8.0, y + 18.0);
        pen.label(label, &self.cracking(of), Anchor::End);
        pen.done()
    }

    /// A relief's return, to the line down the left edge: round its corner or into its side.
    fn to_riser(&self, pen: &mut PartPen, from: (f64, f64)) {
        let back = self.working("return");
        if self.riser_top().is_some_and(|top| top < from.1) {
            pen.line(&[from, (RISER_X, from.1)], back);
            pen.junction((RISER_X, from.1));
        } else {
            pen.line(&[from, (RISER_X + RISER_STUB, from.1)], back);
        }
    }

    /// The priority line up to `top`, with its name.
    pub(super) fn priority_line(&self, top: f64) -> Part {
        let mut pen = PartPen::new("line", "Priority line");
        let mid = 0.5 * (VALVE.1 + top).max(PRIORITY_RELIEF_Y + top);
        pen.line(
            &[(PRIORITY_X, VALVE.1), (PRIORITY_X, mid)],
            self.working("p_c"),
        );
        pen.line(
            &[(PRIORITY_X, mid), (PRIORITY_X, top)],
            self.working("p_su"),
        );
        self.arrow(&mut pen, (PRIORITY_X, 316.0), UP, Signal::LineEndFlow);
        let line = &self.parts.line.line;
        let detail = format!(
            "{} long, bore {}",
            self.size(line.length, Quantity::Length),
            self.size(line.bore, Quantity::Length)
        );
        let x = PRIORITY_X + 14.0;
        pen.text(
            (x, 308.0),
            "Priority line",
            (TextSize::Label, Tone::Ink),
            Anchor::Start,
        );
        pen.text(
            (x, 322.0),
            detail,
            (TextSize::Small, Tone::Quiet),
            Anchor::Start,
        );
        self.show_pressure(&mut pen, (x, 343.0), Anchor::Start, "p_c");
        self.show_signal(&mut pen, (x, 357.0), Anchor::Start, Signal::PriorityFlow);
        pen.done()
    }
}

/// Rest position beside the spring, far position beside it, and the two lines which say that the
/// spool stands anywhere between them.
fn valve_positions(pen: &mut PartPen, rest: &Frame) {
    position(pen, rest);
    pen.arrow(rest.at(-POSITION, -PORT), rest.at(POSITION, -PORT));
    shut(pen, rest, -POSITION, PORT);
    shut(pen, rest, POSITION, PORT);
    let far = rest.moved(0.0, 2.0 * POSITION);
    position(pen, &far);
    for across in [-PORT, PORT] {
        pen.arrow(far.at(-POSITION, across), far.at(POSITION, across));
    }
    for along in [-POSITION - 4.0, POSITION + 4.0] {
        pen.symbol(&rest.all([(along, -POSITION), (along, 3.0 * POSITION)]));
    }
    let spring = Frame::new((rest.centre.0, rest.centre.1 - 9.0), UP, LEFT);
    side_spring(pen, &spring, POSITION);
}
