//! Symbols of ISO 1219-1.

use kurbo::{Arc, Shape};

use super::frame::Frame;
use crate::scene::{Anchor, Line, Paint, PartPen, Prim, Stroke, Tone};
use crate::style::TextSize;

/// Half the side of a relief valve.
pub(super) const RELIEF: f64 = 18.0;

/// Half the side of a position of a directional valve.
pub(super) const POSITION: f64 = 20.0;

/// Radius of pumps and motors.
pub(super) const MACHINE: f64 = 25.0;

/// Half the height of filters and coolers.
pub(super) const DIAMOND: f64 = 17.0;

/// From the centre of a check valve to its ends, against and along the flow.
pub(super) const CHECK: (f64, f64) = (9.0, 19.0);

/// Half the length of a throttle.
pub(super) const THROTTLE: f64 = 8.0;

/// Length of a spring at rest.
pub(super) const SPRING: f64 = 18.0;

/// A zigzag from `across` outward to the side.
fn spring(pen: &mut PartPen, frame: &Frame, across: f64, half_width: f64) {
    const TURNS: usize = 5;
    let mut points = vec![frame.at(-half_width, across)];
    for turn in 0..TURNS {
        let end = if turn % 2 == 0 { 1.0 } else { -1.0 };
        let place = across + SPRING * (turn + 1) as f64 / TURNS as f64;
        points.push(frame.at(end * half_width, place));
    }
    pen.line(&points, Stroke::plain(Line::Symbol));
}

/// Spring on the side of a valve, whose edge is at `across`.
pub(super) fn side_spring(pen: &mut PartPen, frame: &Frame, across: f64) {
    spring(pen, frame, across, 6.0);
}

fn square(pen: &mut PartPen, frame: &Frame, half: f64) {
    let corners = frame.all([(-half, -half), (half, -half), (half, half), (-half, half)]);
    pen.area(&corners, Paint::Ground, Some(Line::Symbol));
}

/// A direct-acting relief: shut at rest, opened by the pressure ahead of it against a spring.
pub(super) fn relief(pen: &mut PartPen, frame: &Frame, pilot: Stroke) {
    square(pen, frame, RELIEF);
    // Off the line of the ports, towards the pilot: pressure shifts it into line.
    let off = -7.0;
    pen.arrow(frame.at(-RELIEF, off), frame.at(RELIEF, off));
    side_spring(pen, frame, RELIEF);
    let (ahead, beside) = (-RELIEF - 9.0, -RELIEF - 9.0);
    pen.line(
        &frame.all([(ahead, 0.0), (ahead, beside), (0.0, beside), (0.0, -RELIEF)]),
        pilot,
    );
}

/// The arrow across a spring or throttle that can be set.
pub(super) fn adjustable(pen: &mut PartPen, frame: &Frame, along: f64, across: f64) {
    let reach = 12.0;
    pen.arrow(
        frame.at(along + reach, across - reach),
        frame.at(along - reach, across + reach),
    );
}

/// A check valve with a light spring.
pub(super) fn check(pen: &mut PartPen, frame: &Frame) {
    let (seat, ball) = (-CHECK.0, 5.0);
    pen.symbol(&frame.all([(seat + 9.0, -9.0), (seat, 0.0), (seat + 9.0, 9.0)]));
    let centre = frame.at(seat + ball * std::f64::consts::SQRT_2, 0.0);
    pen.circle(centre, ball);
    let start = seat + ball * (1.0 + std::f64::consts::SQRT_2);
    let step = (CHECK.1 - start) / 4.0;
    let zigzag = [0.0, 4.0, -4.0, 4.0, 0.0];
    let points: Vec<_> = zigzag
        .iter()
        .enumerate()
        .map(|(index, &across)| frame.at(start + step * index as f64, across))
        .collect();
    pen.symbol(&points);
}

/// A throttle: two arcs that narrow the line.
pub(super) fn throttle(pen: &mut PartPen, frame: &Frame) {
    for side in [-1.0, 1.0] {
        // The chord of the arc lies along the flow, its middle nearest to the line.
        let points: Vec<_> = (-4..=4)
            .map(|i| {
                let along = THROTTLE * f64::from(i) / 4.0;
                let bulge = 3.5 * (1.0 - (along / THROTTLE).powi(2));
                frame.at(along, side * (7.5 - bulge))
            })
            .collect();
        pen.symbol(&points);
    }
}

/// A sharp-edged orifice, whose flow hardly depends on viscosity: two tips that narrow the line.
pub(super) fn orifice(pen: &mut PartPen, frame: &Frame) {
    for side in [-1.0, 1.0] {
        pen.symbol(&frame.all([(-6.0, side * 9.0), (0.0, side * 3.2), (6.0, side * 9.0)]));
    }
}

/// A small throttle in a pilot line.
pub(super) fn damping_hole(pen: &mut PartPen, frame: &Frame) {
    for side in [-1.0, 1.0] {
        let points: Vec<_> = (-3..=3)
            .map(|i| {
                let along = 2.0 * f64::from(i);
                let bulge = 2.6 * (1.0 - (along / 6.0).powi(2));
                frame.at(along, side * (5.8 - bulge))
            })
            .collect();
        pen.symbol(&points);
    }
}

/// A filled triangle on the rim of a machine: its tip at `rim` along the flow for what oil leaves,
/// its base there for what oil enters.
fn triangle(pen: &mut PartPen, frame: &Frame, tip: f64, base: f64) {
    let half = 0.62 * (tip - base).abs();
    let corners = frame.all([(tip, 0.0), (base, half), (base, -half)]);
    pen.area(&corners, Paint::Ink, None);
}

/// A pump: oil leaves at the tip.
pub(super) fn pump(pen: &mut PartPen, frame: &Frame) {
    pen.circle(frame.centre, MACHINE);
    triangle(pen, frame, MACHINE, MACHINE - 13.0);
}

/// A motor: oil enters at the rim.
pub(super) fn motor(pen: &mut PartPen, frame: &Frame) {
    pen.circle(frame.centre, MACHINE);
    triangle(pen, frame, -MACHINE + 13.0, -MACHINE);
}

/// A shaft: two lines from `from` to `to`, on one height.
pub(super) fn shaft(pen: &mut PartPen, from: (f64, f64), to: f64) {
    for side in [-2.5, 2.5] {
        pen.symbol(&[(from.0, from.1 + side), (to, from.1 + side)]);
    }
}

/// The letter inside a prime mover.
pub(super) fn letter(pen: &mut PartPen, at: (f64, f64), text: &str) {
    let baseline = (at.0, at.1 + 0.36 * TextSize::Title.px());
    pen.text(baseline, text, (TextSize::Title, Tone::Ink), Anchor::Middle);
}

/// Frame with its corners to the flow: what filters, coolers and heaters share.
fn diamond(pen: &mut PartPen, frame: &Frame) {
    let d = DIAMOND;
    let corners = frame.all([(-d, 0.0), (0.0, d), (d, 0.0), (0.0, -d)]);
    pen.area(&corners, Paint::Ground, Some(Line::Symbol));
}

/// A filter.
pub(super) fn filter(pen: &mut PartPen, frame: &Frame) {
    diamond(pen, frame);
    let ends = frame.all([(0.0, -DIAMOND), (0.0, DIAMOND)]);
    pen.line(&ends, Stroke::plain(Line::Pilot));
}

/// A cooler: heat leaves.
pub(super) fn cooler(pen: &mut PartPen, frame: &Frame) {
    diamond(pen, frame);
    let reach = DIAMOND - 2.0;
    for side in [-1.0, 1.0] {
        let [from, to] = frame.all([(0.0, 0.0), (0.0, side * reach)]);
        pen.arrow(from, to);
    }
}

/// A reservoir, open to the air; the line ends at the middle of its floor, `at`.
pub(super) fn tank(pen: &mut PartPen, at: (f64, f64)) {
    let (half, height) = (15.0, 11.0);
    pen.symbol(&[
        (at.0 - half, at.1 - height),
        (at.0 - half, at.1 + 3.0),
        (at.0 + half, at.1 + 3.0),
        (at.0 + half, at.1 - height),
    ]);
}

/// A port that is plugged: a cross at the end of the line.
pub(super) fn plug(pen: &mut PartPen, at: (f64, f64)) {
    let r = 6.0;
    pen.symbol(&[(at.0 - r, at.1 - r), (at.0 + r, at.1 + r)]);
    pen.symbol(&[(at.0 - r, at.1 + r), (at.0 + r, at.1 - r)]);
}

/// A shut port inside a position: a short line with a bar, from `along` inward.
pub(super) fn shut(pen: &mut PartPen, frame: &Frame, along: f64, across: f64) {
    let inner = along - along.signum() * 8.0;
    pen.symbol(&frame.all([(along, across), (inner, across)]));
    pen.symbol(&frame.all([(inner, across - 5.0), (inner, across + 5.0)]));
}

/// One position of a directional valve about the centre of `frame`.
pub(super) fn position(pen: &mut PartPen, frame: &Frame) {
    square(pen, frame, POSITION);
}

/// A solenoid beside a valve whose edge is at `across` to the side, growing by `sign`.
pub(super) fn solenoid(pen: &mut PartPen, frame: &Frame, across: f64, sign: f64) {
    let (near, far) = (across, across + sign * 20.0);
    let corners = frame.all([(-9.0, near), (9.0, near), (9.0, far), (-9.0, far)]);
    pen.area(&corners, Paint::Ground, Some(Line::Symbol));
    pen.symbol(&frame.all([(9.0, near), (-9.0, far)]));
}

/// An on/off valve, shut at rest; the lines meet the position at the centre of `frame`.
pub(super) fn on_off(pen: &mut PartPen, frame: &Frame) {
    position(pen, frame);
    shut(pen, frame, -POSITION, 0.0);
    shut(pen, frame, POSITION, 0.0);
    let open = frame.moved(0.0, -2.0 * POSITION);
    position(pen, &open);
    pen.arrow(open.at(-POSITION, 0.0), open.at(POSITION, 0.0));
    solenoid(pen, frame, -3.0 * POSITION, -1.0);
    side_spring(pen, frame, POSITION);
}

/// A load on a shaft: a fan or whatever turns, as a box.
pub(super) fn load(pen: &mut PartPen, centre: (f64, f64)) {
    pen.frame(kurbo::Rect::from_center_size(centre, (30.0, 34.0)));
    // The sense of turning.
    let arc = Arc::new(centre, (8.0, 8.0), -2.4, 4.2, 0.0);
    let stroke = Some(Stroke::plain(Line::Symbol));
    pen.push(Prim::Path {
        outline: arc.to_path(0.05),
        stroke,
        fill: None,
    });
    let end = -2.4_f64 + 4.2;
    let tip = (centre.0 + 8.0 * end.cos(), centre.1 + 8.0 * end.sin());
    let direction = kurbo::Vec2::new(-end.sin(), end.cos());
    pen.head(
        (tip.0 + 3.0 * direction.x, tip.1 + 3.0 * direction.y),
        direction,
        6.0,
    );
}
