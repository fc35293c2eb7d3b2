//! One textured triangle.
//!
//! Scan conversion row by row: a pixel belongs to the triangle that holds its centre. A crossing
//! of a row with an edge is computed from the edge's ends in one fixed order, so two triangles
//! that share an edge share the crossing: no gap, and no pixel painted twice.

use egui::Color32;
use egui::epaint::Vertex;

use crate::picture::Strip;
use crate::texture::Texture;

/// Pixels that may be painted: from the first up to, not including, the second.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) struct Clip {
    pub(crate) x: (usize, usize),
    pub(crate) y: (usize, usize),
}

/// A corner in pixels.
#[derive(Clone, Copy)]
struct Corner {
    x: f32,
    y: f32,
    /// Colour, 0 to 255, then u and v.
    values: [f32; 6],
}

impl Corner {
    fn new(vertex: &Vertex, scale: f32) -> Self {
        let [r, g, b, a] = vertex.color.to_array().map(f32::from);
        Self {
            x: vertex.pos.x * scale,
            y: vertex.pos.y * scale,
            values: [r, g, b, a, vertex.uv.x, vertex.uv.y],
        }
    }
}

impl Clip {
    /// What lies in both.
    pub(crate) fn and(self, other: Self) -> Self {
        Self {
            x: (self.x.0.max(other.x.0), self.x.1.min(other.x.1)),
            y: (self.y.0.max(other.y.0), self.y.1.min(other.y.1)),
        }
    }

    /// Whether no pixel is in it.
    pub(crate) fn is_empty(self) -> bool {
        self.x.0 >= self.x.1 || self.y.0 >= self.y.1
    }

    /// The pixels that a triangle can touch.
    pub(crate) fn around(corners: [&Vertex; 3], scale: f32) -> Self {
        let ends = |of: fn(&Vertex) -> f32| {
            let [a, b, c] = corners.map(|corner| of(corner) * scale);
            // Corners that are no numbers give no pixels, as in `paint`.
            if !(a + b + c).is_finite() {
                return (0, 0);
            }
            let (least, greatest) = (a.min(b).min(c), a.max(b).max(c));
            (first_centre(least), first_centre(greatest))
        };
        let x = ends(|corner| corner.pos.x);
        Self {
            // A crossing may be rounded to just beyond the corners.
            x: (x.0.saturating_sub(1), x.1.saturating_add(1)),
            y: ends(|corner| corner.pos.y),
        }
    }
}

/// Paints one triangle; `scale` is pixels per point. The clip lies within the strip.
pub(crate) fn paint(
    strip: &mut Strip<'_>,
    clip: Clip,
    texture: &Texture,
    corners: [&Vertex; 3],
    scale: f32,
) {
    let flat = corners[1..]
        .iter()
        .all(|c| c.color == corners[0].color && c.uv == corners[0].uv);
    let corners = corners.map(|vertex| Corner::new(vertex, scale));
    if !corners.iter().all(|c| c.x.is_finite() && c.y.is_finite()) {
        return;
    }
    let top = corners.iter().fold(f32::INFINITY, |y, c| y.min(c.y));
    let bottom = corners.iter().fold(f32::NEG_INFINITY, |y, c| y.max(c.y));
    let first = first_centre(top).max(clip.y.0);
    let behind = first_centre(bottom).min(clip.y.1);
    if first >= behind {
        return;
    }
    let Some(slopes) = Slopes::of(&corners) else {
        return;
    };
    let solid = flat.then(|| slopes.colour(texture, corners[0].x, corners[0].y));
    // Feathered edges and washes use one white pixel of the font's texture.
    let one_texel = corners[1..]
        .iter()
        .all(|c| c.values[4..] == corners[0].values[4..])
        .then(|| texture.sample(corners[0].values[4], corners[0].values[5]));
    for row in first..behind {
        let y = row as f32 + 0.5;
        let Some((left, right)) = crossings(&corners, y) else {
            continue;
        };
        let from = first_centre(left).max(clip.x.0);
        let to = first_centre(right).min(clip.x.1);
        if from >= to {
            continue;
        }
        let span = strip.span(row, from, to);
        if let Some(colour) = solid {
            fill(span, colour);
        } else {
            for (column, pixel) in span.iter_mut().enumerate() {
                let x = (from + column) as f32 + 0.5;
                let colour = match one_texel {
                    Some(texel) => slopes.tinted(texel, x, y),
                    None => slopes.colour(texture, x, y),
                };
                *pixel = over(colour, *pixel);
            }
        }
    }
}

/// The first pixel whose centre is at `edge` or behind it.
fn first_centre(edge: f32) -> usize {
    // Negative and not-a-number become 0, which is what clipping wants.
    (edge - 0.5).ceil().max(0.0) as usize
}

/// Where the row crosses the outline, from left to right.
fn crossings(corners: &[Corner; 3], y: f32) -> Option<(f32, f32)> {
    let mut found = [0.0_f32; 3];
    let mut count = 0;
    for (a, b) in [(0, 1), (1, 2), (2, 0)] {
        let (mut a, mut b) = (&corners[a], &corners[b]);
        if (a.y, a.x) > (b.y, b.x) {
            std::mem::swap(&mut a, &mut b);
        }
        if a.y <= y && y < b.y {
            found[count] = a.x + (y - a.y) * ((b.x - a.x) / (b.y - a.y));
            count += 1;
        }
    }
    (count == 2).then(|| (found[0].min(found[1]), found[0].max(found[1])))
}

/// The values of the corners as a plane over the picture.
struct Slopes {
    origin: Corner,
    across: [f32; 6],
    down: [f32; 6],
    least: [f32; 6],
    greatest: [f32; 6],
}

impl Slopes {
    /// `None` if the triangle has no area.
    fn of(corners: &[Corner; 3]) -> Option<Self> {
        let [a, b, c] = corners;
        let (bx, by, cx, cy) = (b.x - a.x, b.y - a.y, c.x - a.x, c.y - a.y);
        let area = bx * cy - by * cx;
        if area.abs() < 1e-9 {
            return None;
        }
        let to_b: [f32; 6] = std::array::from_fn(|i| (b.values[i] - a.values[i]) / area);
        let to_c: [f32; 6] = std::array::from_fn(|i| (c.values[i] - a.values[i]) / area);
        let ends = |f: fn(f32, f32) -> f32| {
            std::array::from_fn(|i| f(f(a.values[i], b.values[i]), c.values[i]))
        };
        Some(Self {
            origin: *a,
            across: std::array::from_fn(|i| to_b[i] * cy - to_c[i] * by),
            down: std::array::from_fn(|i| to_c[i] * bx - to_b[i] * cx),
            least: ends(f32::min),
            greatest: ends(f32::max),
        })
    }

    /// Colour times texture at a point; never beyond what the corners span.
    #[inline]
    fn colour(&self, texture: &Texture, x: f32, y: f32) -> [f32; 4] {
        let sample = texture.sample(self.value(4, x, y), self.value(5, x, y));
        self.tinted(sample, x, y)
    }

    /// Colour at a point times one texel.
    #[inline]
    fn tinted(&self, texel: [f32; 4], x: f32, y: f32) -> [f32; 4] {
        std::array::from_fn(|i| self.value(i, x, y) * texel[i] / 255.0)
    }

    #[inline]
    fn value(&self, i: usize, x: f32, y: f32) -> f32 {
        let (dx, dy) = (x - self.origin.x, y - self.origin.y);
        let plane = self.origin.values[i] + self.across[i] * dx + self.down[i] * dy;
        plane.clamp(self.least[i], self.greatest[i])
    }
}

fn fill(span: &mut [Color32], colour: [f32; 4]) {
    if colour[3] >= 254.5 {
        span.fill(over(colour, Color32::BLACK));
    } else if colour.iter().any(|&channel| channel >= 0.5) {
        for pixel in span {
            *pixel = over(colour, *pixel);
        }
    }
}

/// Premultiplied "over" (Porter & Duff 1984, Computer Graphics 18(3), 253-259).
fn over(front: [f32; 4], back: Color32) -> Color32 {
    let through = 1.0 - front[3] / 255.0;
    let back = back.to_array();
    let [r, g, b, a] = std::array::from_fn(|i| {
        // The cast holds at 0 and 255.
        (front[i] + f32::from(back[i]) * through + 0.5) as u8
    });
    Color32::from_rgba_premultiplied(r, g, b, a)
}
