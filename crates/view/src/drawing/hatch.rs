//! Hatching of cut faces, as lines clipped to the face, so that any painter can draw it.

use kurbo::BezPath;

/// Lines at 45 degrees, `spacing` px apart, inside a simple polygon; rising to the right on the
/// sheet if `rising`, else falling.
pub(super) fn hatched(polygon: &[(f64, f64)], spacing: f64, rising: bool) -> BezPath {
    let sign = if rising { 1.0 } else { -1.0 };
    // A hatch line is where x + sign * y is constant.
    let level = |(x, y): (f64, f64)| x + sign * y;
    let levels = polygon.iter().copied().map(level);
    let (low, high) = levels.fold((f64::INFINITY, f64::NEG_INFINITY), |(low, high), value| {
        (low.min(value), high.max(value))
    });
    let mut path = BezPath::new();
    let step = spacing * std::f64::consts::SQRT_2;
    let mut at = (low / step).ceil() * step + 0.5 * step;
    while at < high {
        let mut cuts: Vec<(f64, f64)> = Vec::new();
        for (index, &from) in polygon.iter().enumerate() {
            let to = polygon[(index + 1) % polygon.len()];
            let (a, b) = (level(from), level(to));
            // Half open, so that a corner counts once.
            if (a <= at) != (b <= at) {
                let share = (at - a) / (b - a);
                cuts.push((
                    from.0 + share * (to.0 - from.0),
                    from.1 + share * (to.1 - from.1),
                ));
            }
        }
        cuts.sort_by(|a, b| a.0.total_cmp(&b.0));
        for pair in cuts.chunks_exact(2) {
            path.move_to(pair[0]);
            path.line_to(pair[1]);
        }
        at += step;
    }
    path
}

#[cfg(test)]
mod tests {
    use super::*;
    use kurbo::Shape;

    #[test]
    fn hatching_stays_inside_and_has_its_spacing() {
        let square = [(0.0, 0.0), (100.0, 0.0), (100.0, 100.0), (0.0, 100.0)];
        for rising in [true, false] {
            let path = hatched(&square, 10.0, rising);
            let frame = path.bounding_box();
            assert!(frame.x0 >= -1e-9 && frame.x1 <= 100.0 + 1e-9, "{frame:?}");
            assert!(frame.y0 >= -1e-9 && frame.y1 <= 100.0 + 1e-9, "{frame:?}");
            // The diagonal is 141 px long.
            let lines = path.segments().count();
            assert!((13..=15).contains(&lines), "{lines} lines");
            for segment in path.segments() {
                let kurbo::PathSeg::Line(line) = segment else {
                    panic!("only lines");
                };
                let step = line.p1 - line.p0;
                let up = step.y < 0.0;
                assert!((step.x.abs() - step.y.abs()).abs() < 1e-9, "45 degrees");
                assert_eq!(up, rising, "leans the right way");
            }
        }
    }
}
