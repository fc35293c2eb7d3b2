//! What lies under a point.

use kurbo::{ParamCurveNearest, Point};

use super::{Part, Prim, Scene};

/// Accuracy of distances, px.
const ACCURACY: f64 = 0.05;

/// A part under a point.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Hit<'a> {
    /// The part.
    pub part: &'a Part,
    /// Distance from the point to its nearest line, px; infinite if it has none.
    pub distance: f64,
}

impl Scene {
    /// What a person means who points at `at`: the part with the nearest line within `reach` (px);
    /// else, of the parts whose frame holds the point, the smallest. Parts painted later win ties.
    #[must_use]
    pub fn hit(&self, at: Point, reach: f64) -> Option<Hit<'_>> {
        let hits = self.parts.iter().map(|part| Hit {
            part,
            distance: part.distance(at),
        });
        let (mut on_line, mut inside): (Option<Hit<'_>>, Option<Hit<'_>>) = (None, None);
        for hit in hits {
            let nearest = on_line.map_or(reach, |best| best.distance);
            if hit.distance <= nearest {
                on_line = Some(hit);
            }
            let least = inside.map_or(f64::INFINITY, |best| best.part.bounds.area());
            if hit.part.bounds.contains(at) && hit.part.bounds.area() <= least {
                inside = Some(hit);
            }
        }
        on_line.or(inside)
    }
}

impl Part {
    /// Distance from a point to the nearest line of the part, px; infinite if it has none.
    #[must_use]
    pub fn distance(&self, at: Point) -> f64 {
        let distances = self.prims.iter().map(|prim| prim.distance(at));
        distances.fold(f64::INFINITY, f64::min)
    }
}

impl Prim {
    /// Distance from a point to the line, px; infinite where nothing is drawn with a line.
    #[must_use]
    pub fn distance(&self, at: Point) -> f64 {
        match self {
            Self::Path {
                outline,
                stroke: Some(_),
                ..
            } => outline
                .segments()
                .map(|segment| segment.nearest(at, ACCURACY).distance_sq.sqrt())
                .fold(f64::INFINITY, f64::min),
            Self::Circle {
                centre,
                radius,
                stroke: Some(_),
                ..
            } => (at.distance(*centre) - radius).abs(),
            _ => f64::INFINITY,
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::scene::{Line, PartPen, Stroke};

    fn scene() -> Scene {
        let mut line = PartPen::new("line", "Line");
        line.line(
            &[(0.0, 0.0), (100.0, 0.0), (100.0, 80.0)],
            Stroke::plain(Line::Working),
        );
        let mut pump = PartPen::new("pump", "Pump");
        pump.circle((100.0, 110.0), 30.0);
        let parts = vec![line.done(), pump.done()];
        Scene::new("Test".to_owned(), String::new(), parts)
    }

    #[test]
    fn the_nearest_line_wins_and_frames_come_after() {
        let scene = scene();
        let id = |x, y| {
            scene
                .hit(Point::new(x, y), 6.0)
                .map(|hit| hit.part.id.as_str())
        };
        assert_eq!(id(50.0, 4.0), Some("line"), "near the segment");
        assert_eq!(id(100.0, 112.0), Some("pump"), "inside the circle");
        assert_eq!(
            id(50.0, 40.0),
            Some("line"),
            "inside the frame of the line only"
        );
        assert_eq!(id(300.0, 300.0), None, "far from everything");
    }

    #[test]
    fn distances_are_those_to_segments() {
        let scene = scene();
        let distance = |x, y| scene.parts[0].distance(Point::new(x, y));
        assert!((distance(50.0, 7.0) - 7.0).abs() < 0.1, "beside a segment");
        assert!((distance(-3.0, -4.0) - 5.0).abs() < 0.1, "beyond an end");
        let pump = scene.parts[1].distance(Point::new(100.0, 150.0));
        assert!((pump - 10.0).abs() < 0.1, "outside a circle: {pump}");
    }
}
