//! Broken lines that stay whole where they are steep.

use egui::{Pos2, Shape, Stroke};

/// Strokes narrower than this are ripple or a jump, and never broken: a gap there would hide a
/// peak.
const STEEP: f32 = 0.75;

/// The shapes of a line with lengths of line and gap in turn; empty for an unbroken one.
pub(crate) fn dashed(points: &[Pos2], pattern: &[f64], stroke: Stroke) -> Vec<Shape> {
    if points.len() < 2 {
        return Vec::new();
    }
    if pattern.is_empty() {
        return vec![Shape::line(points.to_vec(), stroke)];
    }
    let mut pen = Pen {
        pattern,
        place: 0,
        left: pattern[0] as f32,
        run: vec![points[0]],
        shapes: Vec::new(),
        stroke,
    };
    for pair in points.windows(2) {
        pen.go(pair[0], pair[1]);
    }
    pen.lift();
    pen.shapes
}

struct Pen<'a> {
    pattern: &'a [f64],
    place: usize,
    /// Way left in the present stretch.
    left: f32,
    /// The line being drawn; empty in a gap.
    run: Vec<Pos2>,
    shapes: Vec<Shape>,
    stroke: Stroke,
}

impl Pen<'_> {
    fn draws(&self) -> bool {
        self.place.is_multiple_of(2)
    }

    fn go(&mut self, from: Pos2, to: Pos2) {
        if (to.x - from.x).abs() < STEEP {
            if self.run.is_empty() {
                self.run.push(from);
            }
            self.run.push(to);
            if !self.draws() {
                self.lift();
            }
            return;
        }
        let length = from.distance(to);
        let mut gone = 0.0;
        while length - gone > self.left {
            gone += self.left;
            let here = from + (to - from) * (gone / length);
            if self.draws() {
                self.run.push(here);
                self.lift();
            } else {
                self.run.push(here);
            }
            self.place = (self.place + 1) % self.pattern.len();
            // A stretch of no length would never end.
            self.left = (self.pattern[self.place] as f32).max(0.5);
        }
        self.left -= length - gone;
        if self.draws() {
            self.run.push(to);
        }
    }

    fn lift(&mut self) {
        let run = std::mem::take(&mut self.run);
        if run.len() > 1 {
            self.shapes.push(Shape::line(run, self.stroke));
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use egui::{Color32, pos2};

    fn drawn(points: &[Pos2], pattern: &[f64]) -> Vec<Vec<Pos2>> {
        let stroke = Stroke::new(1.0, Color32::BLACK);
        let shapes = dashed(points, pattern, stroke);
        let points = |shape: Shape| match shape {
            Shape::Path(path) => path.points,
            other => panic!("{other:?}"),
        };
        shapes.into_iter().map(points).collect()
    }

    #[test]
    fn dashes_alternate_with_gaps() {
        let lines = drawn(&[pos2(0.0, 0.0), pos2(10.0, 0.0)], &[3.0, 2.0]);
        let ends: Vec<_> = lines.iter().map(|l| (l[0].x, l[l.len() - 1].x)).collect();
        assert_eq!(ends, vec![(0.0, 3.0), (5.0, 8.0)], "3 on, 2 off");
    }

    #[test]
    fn a_spike_in_a_gap_is_drawn() {
        // The spike stands at x = 4, in the gap from 3 to 5.
        let spike = [
            pos2(0.0, 0.0),
            pos2(4.0, 0.0),
            pos2(4.1, 50.0),
            pos2(4.2, 0.0),
            pos2(10.0, 0.0),
        ];
        let lines = drawn(&spike, &[3.0, 2.0]);
        let top = lines.iter().flatten().any(|p| p.y >= 50.0);
        assert!(top, "{lines:?}");
    }
}
