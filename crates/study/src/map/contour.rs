//! Lines of equal value through a layer of a map.

use contour::ContourBuilder;

use super::compute::OperatingMap;
use super::layer::Layer;
use super::refine::value;

/// A line of equal value.
#[derive(Debug, Clone, PartialEq)]
pub struct ContourLine {
    /// Its value, SI.
    pub level: f64,
    /// Points of x and y, SI, along it.
    pub points: Vec<(f64, f64)>,
}

impl OperatingMap {
    /// Lines through `layer` at each of `levels` (SI), interpolated between the grid lines and
    /// broken where there is no equilibrium. A level that the map does not reach has none.
    #[must_use]
    pub fn contours(&self, layer: Layer, levels: &[f64]) -> Vec<ContourLine> {
        let values: Vec<f64> = self.spots.iter().map(|spot| value(spot, layer)).collect();
        self.contours_of(&values, levels)
    }

    /// The border between where the circuit is stable and where it is not: the lines along which
    /// the largest real part of all eigenvalues is 0.
    #[must_use]
    pub fn stability_border(&self) -> Vec<ContourLine> {
        // Growth runs over decades; the damping ratio crosses 0 at the same place and is even.
        let margin = |spot: &super::Spot| {
            spot.cell().map_or(f64::NAN, |cell| {
                let damping = cell.damping.unwrap_or(1.0);
                if cell.growth > 0.0 {
                    damping.min(-f64::MIN_POSITIVE)
                } else {
                    damping
                }
            })
        };
        let values: Vec<f64> = self.spots.iter().map(margin).collect();
        self.contours_of(&values, &[0.0])
    }

    fn contours_of(&self, values: &[f64], levels: &[f64]) -> Vec<ContourLine> {
        let (columns, rows) = (self.xs.len(), self.ys.len());
        let found = ContourBuilder::new(columns, rows, true).lines(values, levels);
        // The only error is a wrong number of values.
        let mut all = Vec::new();
        for line in found.unwrap_or_default() {
            let level = line.threshold();
            for ring in &line.geometry().0 {
                let places = ring.0.iter().map(|c| self.place(c.x - 0.5, c.y - 0.5));
                for points in pieces(places) {
                    all.push(ContourLine { level, points });
                }
            }
        }
        all
    }

    /// The values of x and y at a place counted in grid lines; `None` outside of the grid, where
    /// the builder closes its rings.
    fn place(&self, x: f64, y: f64) -> Option<(f64, f64)> {
        Some((along(&self.xs, x)?, along(&self.ys, y)?))
    }
}

/// Value at a place between lines, counted from 0.
fn along(lines: &[f64], place: f64) -> Option<f64> {
    /// Rounding of a place that lies on the first or the last line.
    const ROUNDING: f64 = 1e-9;
    let last = (lines.len() - 1) as f64;
    if !(-ROUNDING..=last + ROUNDING).contains(&place) {
        return None;
    }
    let place = place.clamp(0.0, last);
    let at = (place.floor() as usize).min(lines.len() - 2);
    Some(lines[at] + (lines[at + 1] - lines[at]) * (place - at as f64))
}

/// Pieces of a closed ring between its gaps. A ring without gaps stays closed; where a piece runs
/// over the ring's first point it is joined.
fn pieces(ring: impl Iterator<Item = Option<(f64, f64)>>) -> Vec<Vec<(f64, f64)>> {
    let places: Vec<_> = ring.collect();
    let whole = places.iter().all(Option::is_some);
    let mut all: Vec<Vec<(f64, f64)>> = vec![Vec::new()];
    for place in &places {
        match (place, all.last_mut()) {
            (Some(point), Some(piece)) => piece.push(*point),
            _ => all.push(Vec::new()),
        }
    }
    if !whole && all.len() > 1 && places.first().is_some_and(Option::is_some) {
        let joins = places.last().is_some_and(Option::is_some);
        if joins && let Some(tail) = all.pop() {
            // The ring repeats its first point at its end.
            let head = std::mem::take(&mut all[0]);
            all[0] = tail.into_iter().chain(head.into_iter().skip(1)).collect();
        }
    }
    all.retain(|piece| piece.len() > 1);
    all
}

#[cfg(test)]
mod tests {
    use std::time::Duration;

    use helmsplit_scenario::Scenario;

    use super::super::{MapEnd, MapSpec, Spot};
    use super::*;

    fn map(xs: &[f64], ys: &[f64]) -> OperatingMap {
        OperatingMap {
            spec: MapSpec::usual(&Scenario::default()),
            xs: xs.to_vec(),
            ys: ys.to_vec(),
            spots: vec![Spot::Waiting; xs.len() * ys.len()],
            end: MapEnd::Finished,
            elapsed: Duration::ZERO,
        }
    }

    /// Uneven lines and a plane: every point of a line has its value exactly.
    #[test]
    fn lines_through_a_plane_are_straight() {
        let map = map(&[0.0, 1.0, 1.5, 4.0, 8.0], &[0.0, 2.0, 5.0, 6.0]);
        let plane = |x: f64, y: f64| 2.0 * x + y;
        let values: Vec<f64> = map
            .ys
            .iter()
            .flat_map(|&y| map.xs.iter().map(move |&x| plane(x, y)))
            .collect();
        let lines = map.contours_of(&values, &[7.0, 100.0]);
        assert_eq!(lines.len(), 1, "{lines:?}");
        assert!(lines[0].points.len() >= 4, "{lines:?}");
        for &(x, y) in &lines[0].points {
            assert!((plane(x, y) - 7.0).abs() < 1e-9, "{x}, {y}");
        }
        let lowest = lines[0].points.iter().map(|p| p.1).fold(f64::MAX, f64::min);
        let highest = lines[0].points.iter().map(|p| p.1).fold(0.0, f64::max);
        assert!(
            lowest.abs() < 1e-9 && (highest - 6.0).abs() < 1e-9,
            "from edge to edge: {lines:?}"
        );
    }

    #[test]
    fn a_hill_has_a_closed_line() {
        let axis: Vec<f64> = (0..9).map(f64::from).collect();
        let map = map(&axis, &axis);
        let values: Vec<f64> = (0..81)
            .map(|i| {
                let (x, y) = (f64::from(i % 9) - 4.0, f64::from(i / 9) - 4.0);
                -x.hypot(y)
            })
            .collect();
        let lines = map.contours_of(&values, &[-2.0]);
        assert_eq!(lines.len(), 1, "{lines:?}");
        let points = &lines[0].points;
        let (first, last) = (points[0], points[points.len() - 1]);
        assert!(
            (first.0 - last.0).hypot(first.1 - last.1) < 1e-9,
            "closed: {points:?}"
        );
        for &(x, y) in points {
            let far = (x - 4.0).hypot(y - 4.0);
            assert!((far - 2.0).abs() < 0.1, "{far}");
        }
    }

    #[test]
    fn a_hole_breaks_the_line() {
        let axis: Vec<f64> = (0..7).map(f64::from).collect();
        let map = map(&axis, &axis);
        let mut values: Vec<f64> = (0..49).map(|i| f64::from(i % 7)).collect();
        values[3 * 7 + 3] = f64::NAN;
        let lines = map.contours_of(&values, &[2.5]);
        assert!(
            lines
                .iter()
                .flat_map(|l| &l.points)
                .all(|p| p.0.is_finite() && p.1.is_finite()),
            "{lines:?}"
        );
        let reached = |y: f64| {
            let mut points = lines.iter().flat_map(|l| &l.points);
            points.any(|p| (p.1 - y).abs() < 0.6)
        };
        assert!(reached(0.0) && reached(6.0), "{lines:?}");
    }
}
