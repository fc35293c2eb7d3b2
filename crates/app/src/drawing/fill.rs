//! Filled polygons as triangles: egui itself fills convex ones only.

use earcut::Earcut;
use egui::epaint::Tessellator;
use egui::{Color32, Mesh, Pos2, Shape, Stroke};

/// Fills a simple polygon.
pub(super) fn fill(points: &[Pos2], colour: Color32, pen: &mut Tessellator, mesh: &mut Mesh) {
    if is_convex(points) {
        let shape = Shape::convex_polygon(points.to_vec(), colour, Stroke::NONE);
        pen.tessellate_shape(shape, mesh);
        return;
    }
    let base = mesh.vertices.len() as u32;
    for &point in points {
        mesh.colored_vertex(point, colour);
    }
    mesh.indices
        .extend(triangles(points).into_iter().map(|index| base + index));
}

/// Corners of triangles that cover a simple polygon.
fn triangles(points: &[Pos2]) -> Vec<u32> {
    let mut corners = Vec::new();
    let points = points.iter().map(|point| [point.x, point.y]);
    Earcut::new().earcut(points, &[], &mut corners);
    corners
}

/// Whether a polygon turns one way only.
fn is_convex(points: &[Pos2]) -> bool {
    let (mut left, mut right) = (false, false);
    for (index, &corner) in points.iter().enumerate() {
        let before = points[(index + points.len() - 1) % points.len()];
        let after = points[(index + 1) % points.len()];
        let (a, b) = (corner - before, after - corner);
        let turn = a.x * b.y - a.y * b.x;
        left |= turn < -1e-4;
        right |= turn > 1e-4;
    }
    !(left && right)
}

#[cfg(test)]
mod tests {
    use super::*;
    use egui::pos2;

    fn area(points: &[Pos2], corners: &[u32]) -> f32 {
        corners
            .chunks_exact(3)
            .map(|corner| {
                let [a, b, c] = [0, 1, 2].map(|i| points[corner[i] as usize]);
                0.5 * ((b - a).x * (c - a).y - (b - a).y * (c - a).x).abs()
            })
            .sum()
    }

    #[test]
    fn a_spool_with_its_neck_is_covered_exactly() {
        // 10 long, 4 high, with a neck of 2 x 2 cut from both sides.
        let spool = [
            (0.0, 0.0),
            (4.0, 0.0),
            (4.0, 1.0),
            (6.0, 1.0),
            (6.0, 0.0),
            (10.0, 0.0),
            (10.0, 4.0),
            (6.0, 4.0),
            (6.0, 3.0),
            (4.0, 3.0),
            (4.0, 4.0),
            (0.0, 4.0),
        ]
        .map(|(x, y)| pos2(x, y));
        assert!(!is_convex(&spool), "it has a neck");
        let corners = triangles(&spool);
        assert_eq!(corners.len(), 3 * (spool.len() - 2), "triangles");
        let covered = area(&spool, &corners);
        assert!((covered - 36.0).abs() < 1e-4, "{covered}");
    }

    #[test]
    fn rectangles_are_convex_whichever_way_they_turn() {
        let mut square = [(0.0, 0.0), (3.0, 0.0), (3.0, 2.0), (0.0, 2.0)].map(|(x, y)| pos2(x, y));
        assert!(is_convex(&square), "clockwise");
        square.reverse();
        assert!(is_convex(&square), "the other way");
    }
}
