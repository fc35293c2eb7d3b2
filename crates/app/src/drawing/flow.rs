//! Arrows that show flow: they move along their line while the run is played.

use std::collections::BTreeMap;

use egui::{Color32, Painter, Pos2, Shape, Stroke, Vec2};

/// Way of an arrow in one cycle, points, where its line is long enough.
const WAY: f32 = 30.0;

/// Cycles of the fastest arrow, 1/s: slow enough for the eye to follow.
const FASTEST: f32 = 1.6;

/// Half the width of an arrow head as a share of its length.
const HALF_WIDTH: f32 = 0.42;

/// An arrow on its line.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct FlowArrow {
    /// Part, and place of the arrow at rest to a point: what tells arrows apart.
    pub(super) name: (usize, i32, i32),
    /// Its middle at rest.
    pub(super) middle: Pos2,
    pub(super) direction: Vec2,
    pub(super) length: f32,
    /// 0 to 1.
    pub(super) pace: f32,
    /// How far it may go to both sides without leaving its line, points.
    pub(super) reach: f32,
    pub(super) fill: Color32,
    pub(super) outline: Stroke,
}

/// How far the arrows have come, in cycles. Empty while nothing is played: arrows stand at rest.
#[derive(Debug, Default)]
pub(super) struct Phases {
    by_arrow: BTreeMap<(usize, i32, i32), f32>,
}

impl Phases {
    /// Lets the arrows move for so many seconds.
    pub(super) fn advance(&mut self, arrows: &[FlowArrow], seconds: f32) {
        for arrow in arrows {
            let phase = self.by_arrow.entry(arrow.name).or_default();
            *phase = (*phase + seconds * FASTEST * arrow.pace).fract();
        }
    }

    /// Puts the arrows back.
    pub(super) fn rest(&mut self) {
        self.by_arrow.clear();
    }

    fn of(&self, arrow: &FlowArrow) -> f32 {
        self.by_arrow.get(&arrow.name).copied().unwrap_or(0.0)
    }
}

/// Paints the arrows where they are. An arrow fades out at the end of its way and in at the start.
pub(super) fn paint(painter: &Painter, arrows: &[FlowArrow], phases: &Phases) {
    for arrow in arrows {
        // From -1/2 to 1/2, and 0 at rest.
        let phase = (phases.of(arrow) + 0.5).fract() - 0.5;
        let way = WAY.min(2.0 * arrow.reach);
        let shown = ((0.5 - phase.abs()) * 6.0).clamp(0.0, 1.0);
        let middle = arrow.middle + arrow.direction * (phase * way);
        let tip = middle + arrow.direction * (0.5 * arrow.length);
        let base = middle - arrow.direction * (0.5 * arrow.length);
        let side = arrow.direction.rot90() * (HALF_WIDTH * arrow.length);
        let corners = vec![tip, base + side, base - side];
        let outline = Stroke::new(
            arrow.outline.width,
            arrow.outline.color.gamma_multiply(shown),
        );
        let fill = arrow.fill.gamma_multiply(shown);
        painter.add(Shape::convex_polygon(corners, fill, outline));
    }
}

/// How far a point on one of the lines may move along `direction` to both sides without leaving
/// it; nothing if it is on none.
pub(super) fn reach(lines: &[[Pos2; 2]], at: Pos2, direction: Vec2) -> f32 {
    let free = lines.iter().filter_map(|&[from, to]| {
        let along = (to - from).normalized();
        let (a, b) = ((from - at).dot(direction), (to - at).dot(direction));
        let beside = (at - from).dot(along.rot90()).abs();
        let parallel = along.dot(direction).abs() > 0.99;
        let within = a.min(b) <= 0.0 && a.max(b) >= 0.0;
        (parallel && beside < 1.5 && within).then(|| a.abs().min(b.abs()))
    });
    free.fold(0.0, f32::max)
}

#[cfg(test)]
mod tests {
    use super::*;
    use egui::{pos2, vec2};

    fn arrow(pace: f32) -> FlowArrow {
        FlowArrow {
            name: (0, 0, 0),
            middle: pos2(50.0, 10.0),
            direction: vec2(1.0, 0.0),
            length: 10.0,
            pace,
            reach: 20.0,
            fill: Color32::BLACK,
            outline: Stroke::NONE,
        }
    }

    #[test]
    fn arrows_move_by_their_pace_and_come_to_rest() {
        let mut phases = Phases::default();
        let (fast, slow) = (
            arrow(1.0),
            FlowArrow {
                name: (1, 0, 0),
                ..arrow(0.25)
            },
        );
        let arrows = [fast, slow];
        phases.advance(&arrows, 0.1);
        let [fast, slow] = [phases.of(&arrows[0]), phases.of(&arrows[1])];
        assert!((fast - 4.0 * slow).abs() < 1e-6, "{fast} and {slow}");
        phases.rest();
        assert!(phases.of(&arrows[0]).abs() < 1e-9, "at rest");
    }

    #[test]
    fn an_arrow_stays_on_its_line() {
        let lines = [
            [pos2(0.0, 10.0), pos2(80.0, 10.0)],
            [pos2(80.0, 10.0), pos2(80.0, 90.0)],
        ];
        let right = vec2(1.0, 0.0);
        assert!(
            (reach(&lines, pos2(50.0, 10.0), right) - 30.0).abs() < 1e-4,
            "to its end"
        );
        assert!(reach(&lines, pos2(50.0, 40.0), right) < 1e-6, "on no line");
    }
}
