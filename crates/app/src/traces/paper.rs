//! From times and values to points on the screen.

use egui::{Color32, Mesh, Pos2, Shape, pos2};
use helmsplit_view::plot::{Axis, Shade};

use super::drawn::Line;

/// Places further outside than this are drawn here: the panel is cut off long before, points.
const FAR_OUTSIDE: f64 = 1e5;

/// Time and value axis of one panel.
pub(super) struct Paper<'a> {
    pub(super) time: &'a Axis,
    pub(super) values: &'a Axis,
}

impl Paper<'_> {
    fn place(&self, [t, value]: [f64; 2]) -> Pos2 {
        let y = self.values.position(value).clamp(-FAR_OUTSIDE, FAR_OUTSIDE);
        let x = self.time.position(t).clamp(-FAR_OUTSIDE, FAR_OUTSIDE);
        pos2(x as f32, y as f32)
    }

    /// A line on paper: one run of points for each stretch between gaps.
    pub(super) fn runs(&self, line: &Line<'_>) -> Vec<Vec<Pos2>> {
        line.thinned
            .split(|point| !point[1].is_finite())
            .map(|piece| piece.iter().map(|&point| self.place(point)).collect())
            .collect()
    }

    /// A strip between two lines, one column for each pixel.
    pub(super) fn area(&self, shade: &Shade, colour: Color32) -> Shape {
        let mut columns: Vec<[f32; 3]> = Vec::new();
        let from = shade
            .points
            .partition_point(|point| point[0] < self.time.low);
        for &[t, low, high] in &shade.points[from.saturating_sub(1)..] {
            if t > self.time.high {
                break;
            }
            if !(self.time.contains(t) && low.is_finite() && high.is_finite()) {
                continue;
            }
            let (x, low, high) = (
                self.time.position(t) as f32,
                self.values.position(low) as f32,
                self.values.position(high) as f32,
            );
            match columns.last_mut() {
                Some(last) if x - last[0] < 1.0 => {
                    last[1] = last[1].max(low);
                    last[2] = last[2].min(high);
                }
                _ => columns.push([x, low, high]),
            }
        }
        let mut mesh = Mesh::default();
        for pair in columns.windows(2) {
            let [[x, low, high], [next, next_low, next_high]] = [pair[0], pair[1]];
            let base = mesh.vertices.len() as u32;
            for (x, y) in [(x, low), (x, high), (next, next_low), (next, next_high)] {
                mesh.colored_vertex(pos2(x, y), colour);
            }
            mesh.add_triangle(base, base + 1, base + 2);
            mesh.add_triangle(base + 1, base + 2, base + 3);
        }
        Shape::mesh(mesh)
    }
}
