//! Hydrostatic steering unit, simplified to its directional valve, meter and wheel, with suction
//! checks and shock reliefs; the steering cylinder with its load.

use helmsplit_model::{Quantity, Signal, SteeringGear};
use kurbo::{Ellipse, Rect, Shape};

use super::context::Context;
use super::frame::{DOWN, Frame, LEFT, RIGHT, UP};
use super::places::{PRIORITY_X, RISER_STUB, RISER_X};
use super::symbols::{CHECK, POSITION, RELIEF, check, position, relief, shut};
use crate::scene::{Anchor, Line, Paint, Part, PartPen, Prim, Stroke};

/// The return of the steering unit.
pub(super) const RETURN_Y: f64 = 268.0;

/// Ports stand so far beside the middle of a position.
const PORT: f64 = 10.0;

/// Middle of the directional valve.
const MIDDLE: (f64, f64) = (PRIORITY_X - PORT, 222.0);

/// Return lines inside the unit, left and right.
const RAILS: (f64, f64) = (240.0, 532.0);

/// Lines to the cylinder.
const LINES: (f64, f64) = (320.0, 452.0);

/// Heights of suction checks and shock reliefs.
const CHECK_Y: f64 = 160.0;
const SHOCK_Y: f64 = 112.0;

/// Frame of the unit: left, right, foot; top with and without shock reliefs.
const FRAME: (f64, f64, f64) = (224.0, 550.0, 286.0);
const TOP: (f64, f64) = (66.0, 142.0);

/// The cylinder: left, top, right, foot.
const CYLINDER: (f64, f64, f64, f64) = (300.0, 6.0, 472.0, 42.0);

/// Largest shift of the piston on the sheet.
const SHIFT: f64 = 50.0;

/// The wall that the tyres push against.
const WALL_X: f64 = 664.0;

impl Context<'_> {
    pub(super) fn steering_unit(&self, gear: &SteeringGear) -> Part {
        let mut pen = PartPen::new("steering.unit", "Steering unit");
        let top = if gear.shock_relief.is_some() {
            TOP.0
        } else {
            TOP.1
        };
        let frame = Rect::new(FRAME.0, top, FRAME.1, FRAME.2).to_path(0.1);
        pen.path(frame, Some(Stroke::plain(Line::Envelope)), None);
        self.unit_lines(&mut pen, gear.shock_relief.is_some());
        self.unit_checks(&mut pen, gear.shock_relief.is_some());
        if gear.shock_relief.is_some() {
            self.shock_reliefs(&mut pen);
        }
        unit_positions(&mut pen);
        wheel_and_meter(&mut pen);
        let displacement = gear.unit.displacement;
        let detail = format!("{}/rev", self.size(displacement, Quantity::Volume));
        let label = (FRAME.0 - 12.0, 190.0);
        pen.label(label, &detail, Anchor::End);
        let below = (label.0, label.1 + 28.0);
        self.show_signal(&mut pen, below, Anchor::End, Signal::WheelRateEffective);
        pen.done()
    }

    fn unit_lines(&self, pen: &mut PartPen, shock: bool) {
        let (x, y) = MIDDLE;
        let back = self.working("return");
        // Each rail turns at its top into the line of what stands there, so that the corner joins.
        let (high, reach) = if shock {
            (SHOCK_Y, RELIEF)
        } else {
            (CHECK_Y, CHECK.0)
        };
        let left = (0.5 * (RAILS.0 + LINES.0) - reach, high);
        let right = (0.5 * (RAILS.1 + LINES.1) + reach, high);
        let riser = RISER_X + RISER_STUB;
        pen.line(
            &[
                (riser, RETURN_Y),
                (RAILS.1, RETURN_Y),
                (RAILS.1, high),
                right,
            ],
            back,
        );
        pen.line(&[(RAILS.0, RETURN_Y), (RAILS.0, high), left], back);
        pen.line(&[(x - PORT, y + POSITION), (x - PORT, RETURN_Y)], back);
        pen.line(
            &[(PRIORITY_X, FRAME.2), (PRIORITY_X, y + POSITION)],
            self.working("p_su"),
        );
        pen.junction((x - PORT, RETURN_Y));
        pen.junction((RAILS.0, RETURN_Y));
        let level = y - POSITION - 14.0;
        for (port, line, pressure, sign) in [
            (x - PORT, LINES.0, "p_A", 1.0),
            (x + PORT, LINES.1, "p_B", -1.0),
        ] {
            let stroke = self.working(pressure);
            pen.line(
                &[
                    (port, y - POSITION),
                    (port, level),
                    (line, level),
                    (line, CYLINDER.3),
                ],
                stroke,
            );
            self.cylinder_arrow(pen, (line, CYLINDER.3 + 14.0), sign);
            let beside = (line + 8.0, CYLINDER.3 + 18.0);
            self.show_pressure(pen, beside, Anchor::Start, pressure);
        }
        self.arrow(pen, (150.0, RETURN_Y), LEFT, Signal::SteeringReturnFlow);
    }

    /// An arrow at a port of the cylinder, from the velocity of its piston.
    fn cylinder_arrow(&self, pen: &mut PartPen, at: (f64, f64), sign: f64) {
        let velocity = self.moment.and_then(|moment| moment.state("v_c"));
        let Some(velocity) = velocity.filter(|v| v.abs() > LEAST_VELOCITY) else {
            return;
        };
        let direction = if sign * velocity > 0.0 { UP } else { DOWN };
        pen.push(Prim::Arrow {
            tip: (at.0, at.1 + 5.0 * direction.y).into(),
            direction,
            length: 10.0,
            paint: Paint::Ink,
            pace: (velocity.abs() / FAST).min(1.0),
        });
    }

    fn unit_checks(&self, pen: &mut PartPen, shock: bool) {
        for (rail, line, flow, pressure) in [
            (RAILS.0, LINES.0, RIGHT, "p_A"),
            (RAILS.1, LINES.1, LEFT, "p_B"),
        ] {
            let frame = Frame::new((0.5 * (rail + line), CHECK_Y), flow, UP);
            let half = 0.5 * (rail - line).abs();
            if shock {
                let back = self.working("return");
                pen.line(&frame.all([(-half, 0.0), (-CHECK.0, 0.0)]), back);
            }
            pen.line(
                &frame.all([(CHECK.1, 0.0), (half, 0.0)]),
                self.working(pressure),
            );
            check(pen, &frame);
            pen.junction((line, CHECK_Y));
        }
    }

    fn shock_reliefs(&self, pen: &mut PartPen) {
        for (rail, line, flow, pressure) in [
            (RAILS.0, LINES.0, LEFT, "p_A"),
            (RAILS.1, LINES.1, RIGHT, "p_B"),
        ] {
            let frame = Frame::new((0.5 * (rail + line), SHOCK_Y), flow, UP);
            let half = 0.5 * (rail - line).abs();
            pen.line(
                &frame.all([(-half, 0.0), (-RELIEF, 0.0)]),
                self.working(pressure),
            );
            relief(pen, &frame, self.pilot(pressure));
            pen.junction((line, SHOCK_Y));
            pen.junction((rail, CHECK_Y));
        }
    }

    pub(super) fn steering_cylinder(&self, gear: &SteeringGear) -> Part {
        let mut pen = PartPen::new("steering.cylinder", "Steering cylinder");
        let (left, top, right, foot) = CYLINDER;
        let y = 0.5 * (top + foot);
        let travel = self.moment.and_then(|moment| moment.state("y_c"));
        let travel = travel.unwrap_or(self.parts.cylinder_start);
        let share = (2.0 * travel / gear.cylinder.stroke).clamp(-1.0, 1.0);
        let piston = 0.5 * (left + right) + SHIFT * share;
        let chamber = |name| Paint::Oil(self.pressure(name).map(|p| self.scale.share(p)));
        pen.block(Rect::new(left, top, piston, foot), chamber("p_A"));
        pen.block(Rect::new(piston, top, right, foot), chamber("p_B"));
        let end = piston + 160.0;
        let both = (gear.cylinder.area_a - gear.cylinder.area_b).abs()
            < 0.02 * gear.cylinder.area_a.max(gear.cylinder.area_b);
        rod(&mut pen, (piston, end), y);
        if both {
            rod(&mut pen, (piston - 150.0, piston), y);
        }
        let frame = Rect::new(left, top, right, foot).to_path(0.1);
        pen.path(frame, Some(Stroke::plain(Line::Symbol)), None);
        pen.frame(Rect::new(piston - 4.0, top, piston + 4.0, foot));
        pen.frame(Rect::new(end, top + 2.0, end + 30.0, foot - 2.0));
        if gear.tyre_rate > 0.0 {
            tyre(&mut pen, end + 30.0, y);
        }
        let at = (WALL_X + 16.0, y);
        let stroke = self.size(gear.cylinder.stroke, Quantity::Length);
        pen.label(
            at,
            &format!("stroke {stroke}, wheels as a load"),
            Anchor::Start,
        );
        pen.done()
    }
}

/// Below this velocity the cylinder stands still, m/s.
const LEAST_VELOCITY: f64 = 5e-4;

/// A fast cylinder, m/s.
const FAST: f64 = 0.1;

fn rod(pen: &mut PartPen, (from, to): (f64, f64), y: f64) {
    pen.frame(Rect::new(from, y - 4.0, to, y + 4.0));
}

/// The tyres' spring from the load to a wall.
fn tyre(pen: &mut PartPen, from: f64, y: f64) {
    const TURNS: u32 = 8;
    let length = WALL_X - from;
    let mut points = vec![(from, y)];
    for turn in 0..TURNS {
        let x = from + length * (f64::from(turn) + 0.5) / f64::from(TURNS);
        points.push((x, if turn % 2 == 0 { y - 7.0 } else { y + 7.0 }));
    }
    points.push((WALL_X, y));
    pen.line(&points, Stroke::plain(Line::Symbol));
    pen.symbol(&[(WALL_X, y - 16.0), (WALL_X, y + 16.0)]);
    for step in 0..4_u32 {
        let at = y - 12.0 + 9.0 * f64::from(step);
        pen.line(
            &[(WALL_X, at), (WALL_X + 6.0, at - 6.0)],
            Stroke::plain(Line::Fine),
        );
    }
}

/// Neutral with an open centre and shut cylinder ports; one position for each sense.
fn unit_positions(pen: &mut PartPen) {
    let neutral = Frame::new(MIDDLE, UP, RIGHT);
    position(pen, &neutral);
    pen.symbol(&neutral.all([
        (-POSITION, -PORT),
        (-POSITION + 11.0, -PORT),
        (-POSITION + 11.0, PORT),
        (-POSITION, PORT),
    ]));
    shut(pen, &neutral, POSITION, -PORT);
    shut(pen, &neutral, POSITION, PORT);
    let crossed = neutral.moved(0.0, -2.0 * POSITION);
    position(pen, &crossed);
    pen.arrow(crossed.at(-POSITION, PORT), crossed.at(POSITION, -PORT));
    pen.arrow(crossed.at(POSITION, PORT), crossed.at(-POSITION, -PORT));
    let straight = neutral.moved(0.0, 2.0 * POSITION);
    position(pen, &straight);
    pen.arrow(straight.at(-POSITION, PORT), straight.at(POSITION, PORT));
    pen.arrow(straight.at(POSITION, -PORT), straight.at(-POSITION, -PORT));
    for along in [-POSITION - 4.0, POSITION + 4.0] {
        pen.symbol(&neutral.all([(along, -3.0 * POSITION), (along, 3.0 * POSITION)]));
    }
}

/// Wheel on one side of the valve, meter on the other, joined by the shaft.
fn wheel_and_meter(pen: &mut PartPen) {
    let (x, y) = MIDDLE;
    let (left, right) = (x - 3.0 * POSITION, x + 3.0 * POSITION);
    let wheel = 282.0;
    super::symbols::shaft(pen, (wheel, y), left);
    pen.push(Prim::Path {
        outline: Ellipse::new((wheel, y), (5.0, 24.0), 0.0).to_path(0.05),
        stroke: Some(Stroke::plain(Line::Symbol)),
        fill: Some(Paint::Ground),
    });
    let (meter, radius) = ((right + 40.0, y), 18.0);
    super::symbols::shaft(pen, (right, y), meter.0 - radius);
    pen.circle(meter, radius);
    // It turns and measures both ways.
    for sign in [-1.0, 1.0] {
        let rim = y + sign * radius;
        let base = y + sign * (radius - 10.0);
        let corners = [
            (meter.0 - 6.0, rim_at(radius, 6.0, sign, y)),
            (meter.0 + 6.0, rim_at(radius, 6.0, sign, y)),
            (meter.0, base),
        ];
        debug_assert!(
            (rim - y).abs() >= (base - y).abs(),
            "the triangle points inward"
        );
        pen.area(&corners, Paint::Ink, None);
    }
}

/// Height of a circle's rim beside its middle.
fn rim_at(radius: f64, beside: f64, sign: f64, y: f64) -> f64 {
    y + sign * (radius * radius - beside * beside).sqrt()
}
