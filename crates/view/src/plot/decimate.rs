//! Fewer points, the same picture.

/// Thins a line to at most four points for each of `columns` pixel columns over the times `from`
/// to `to`: the first, the least, the largest and the last, in their order. So every peak stays,
/// however short. Points outside are dropped but for one neighbour on each side, so that the line
/// still enters and leaves. A gap (a value that is not finite) stays a gap.
///
/// # Examples
/// ```
/// use helmsplit_view::plot::decimate;
///
/// let mut points: Vec<_> = (0..1_000_000).map(|i| [f64::from(i), 1.0]).collect();
/// points[654_321][1] = 9.0;
/// let drawn = decimate(&points, 0.0, 999_999.0, 800);
/// assert!(drawn.len() <= 4 * 800);
/// assert!(drawn.contains(&[654_321.0, 9.0]));
/// ```
#[must_use]
pub fn decimate(points: &[[f64; 2]], from: f64, to: f64, columns: usize) -> Vec<[f64; 2]> {
    let points = within(points, from, to);
    let mut drawn = Vec::new();
    let mut column = Column::default();
    for (index, &point) in points.iter().enumerate() {
        let share = (point[0] - from) / (to - from);
        column.begin((share * columns as f64).floor(), &mut drawn);
        column.take_point(index, point, &mut drawn);
    }
    column.flush(&mut drawn);
    drawn
}

/// The points from the last one before `from` to the first one behind `to`.
fn within(points: &[[f64; 2]], from: f64, to: f64) -> &[[f64; 2]] {
    let first = points.partition_point(|point| point[0] < from);
    if first == points.len() {
        return &[];
    }
    let behind = first + points[first..].partition_point(|point| point[0] <= to);
    let end = (behind + 1).min(points.len());
    &points[first.saturating_sub(1)..end]
}

/// What one pixel column keeps.
#[derive(Default)]
pub(super) struct Column {
    place: f64,
    kept: Option<Kept>,
}

/// Points of one column, each with its position in the line.
struct Kept {
    first: (usize, [f64; 2]),
    least: (usize, [f64; 2]),
    largest: (usize, [f64; 2]),
    last: (usize, [f64; 2]),
}

impl Column {
    /// Goes to a column; what was kept of another one is drawn.
    #[allow(clippy::float_cmp, reason = "both are whole numbers or not numbers")]
    pub(super) fn begin(&mut self, place: f64, drawn: &mut Vec<[f64; 2]>) {
        if self.place != place {
            self.flush(drawn);
            self.place = place;
        }
    }

    /// Takes one point, which may be a gap.
    pub(super) fn take_point(&mut self, index: usize, point: [f64; 2], drawn: &mut Vec<[f64; 2]>) {
        if point[0].is_finite() && point[1].is_finite() {
            let here = (index, point);
            self.take(here, here, here, here);
            return;
        }
        self.flush(drawn);
        // One mark is enough for a gap, none before the first point.
        if drawn.last().is_some_and(|last| last[1].is_finite()) {
            drawn.push([point[0], f64::NAN]);
        }
    }

    /// Takes points without a gap that follow one another, by the positions of the first, the
    /// least, the largest and the last of them.
    pub(super) fn take_block(
        &mut self,
        points: &[[f64; 2]],
        (first, least, largest, last): (usize, usize, usize, usize),
    ) {
        let at = |index: usize| (index, points[index]);
        self.take(at(first), at(least), at(largest), at(last));
    }

    fn take(
        &mut self,
        first: (usize, [f64; 2]),
        least: (usize, [f64; 2]),
        largest: (usize, [f64; 2]),
        last: (usize, [f64; 2]),
    ) {
        let Some(kept) = &mut self.kept else {
            self.kept = Some(Kept {
                first,
                least,
                largest,
                last,
            });
            return;
        };
        if least.1[1] < kept.least.1[1] {
            kept.least = least;
        }
        if largest.1[1] > kept.largest.1[1] {
            kept.largest = largest;
        }
        kept.last = last;
    }

    /// Draws what was kept.
    pub(super) fn flush(&mut self, drawn: &mut Vec<[f64; 2]>) {
        let Some(kept) = self.kept.take() else {
            return;
        };
        let (early, late) = if kept.least.0 <= kept.largest.0 {
            (kept.least, kept.largest)
        } else {
            (kept.largest, kept.least)
        };
        let mut latest = None;
        for (index, point) in [kept.first, early, late, kept.last] {
            if latest != Some(index) {
                drawn.push(point);
                latest = Some(index);
            }
        }
    }
}

/// Drops the inner points of a line on paper that lie within `tolerance` of the straight line
/// between the points that stay. All points are finite and in the same unit on both axes.
///
/// # Source
/// Ramer (1972), Computer Graphics and Image Processing 1, 244-256; Douglas & Peucker (1973),
/// Cartographica 10, 112-122.
#[must_use]
pub fn straighten(points: &[[f64; 2]], tolerance: f64) -> Vec<[f64; 2]> {
    if points.len() < 3 {
        return points.to_vec();
    }
    let mut stays = vec![false; points.len()];
    stays[0] = true;
    stays[points.len() - 1] = true;
    let mut open = vec![(0, points.len() - 1)];
    while let Some((first, last)) = open.pop() {
        let mut farthest = (tolerance, None);
        for index in first + 1..last {
            let away = distance(points[index], points[first], points[last]);
            if away > farthest.0 {
                farthest = (away, Some(index));
            }
        }
        if let (_, Some(index)) = farthest {
            stays[index] = true;
            open.push((first, index));
            open.push((index, last));
        }
    }
    let kept = points.iter().zip(stays).filter(|(_, stays)| *stays);
    kept.map(|(point, _)| *point).collect()
}

/// Distance of a point from the stretch between two others.
fn distance(point: [f64; 2], from: [f64; 2], to: [f64; 2]) -> f64 {
    let along = [to[0] - from[0], to[1] - from[1]];
    let away = [point[0] - from[0], point[1] - from[1]];
    let length = along[0] * along[0] + along[1] * along[1];
    let share = if length > 0.0 {
        ((away[0] * along[0] + away[1] * along[1]) / length).clamp(0.0, 1.0)
    } else {
        0.0
    };
    (away[0] - share * along[0]).hypot(away[1] - share * along[1])
}

#[cfg(test)]
#[allow(clippy::float_cmp, reason = "points are copied, never computed")]
mod tests {
    use super::*;
    use proptest::prelude::*;

    #[test]
    fn a_spike_of_one_sample_in_a_million_stays() {
        let mut points: Vec<_> = (0..1_000_000)
            .map(|i| [f64::from(i) * 1e-5, (f64::from(i) * 1e-4).sin()])
            .collect();
        for (index, value) in [(123_456, 40.0), (777_777, -55.0)] {
            points[index][1] = value;
            let drawn = decimate(&points, 0.0, 10.0, 900);
            assert!(drawn.contains(&points[index]), "spike of {value}");
            assert!(drawn.len() <= 4 * 901, "{} points", drawn.len());
        }
    }

    #[test]
    fn gaps_stay_gaps_and_edges_keep_their_neighbours() {
        let nan = f64::NAN;
        let points = [
            [0.0, nan],
            [1.0, 1.0],
            [2.0, nan],
            [3.0, nan],
            [4.0, 4.0],
            [9.0, 9.0],
        ];
        let drawn = decimate(&points, 0.0, 5.0, 10);
        let times: Vec<_> = drawn.iter().map(|point| point[0]).collect();
        assert_eq!(
            times,
            [1.0, 2.0, 4.0, 9.0],
            "one mark for the gap, one neighbour behind"
        );
        assert!(drawn[1][1].is_nan(), "the gap");
        let inside = decimate(&points, 3.5, 4.5, 10);
        assert_eq!(
            inside[0],
            [4.0, 4.0],
            "a gap before the first point is no gap"
        );
    }

    #[test]
    fn jumps_keep_both_ends() {
        let points = [[0.0, 0.0], [1.0, 0.0], [1.0, 90.0], [2.0, 90.0]];
        assert_eq!(decimate(&points, 0.0, 2.0, 100), points, "nothing to thin");
        assert_eq!(
            decimate(&points, 5.0, 6.0, 10),
            [[0.0; 2]; 0],
            "nothing in view"
        );
        assert_eq!(decimate(&[], 0.0, 1.0, 10), [[0.0; 2]; 0], "nothing at all");
    }

    #[test]
    fn straight_stretches_shrink_to_their_ends() {
        let line: Vec<_> = (0..100)
            .map(|i| [f64::from(i), 3.0 * f64::from(i)])
            .collect();
        assert_eq!(straighten(&line, 0.1), [line[0], line[99]], "one stretch");
        let there_and_back = [[0.0, 0.0], [0.0, 50.0], [0.0, 0.0]];
        assert_eq!(
            straighten(&there_and_back, 0.1),
            there_and_back,
            "the peak stays"
        );
    }

    proptest! {
        #[test]
        fn every_column_keeps_its_ends_and_extremes(
            values in prop::collection::vec(-1e3..1e3_f64, 1..400),
            columns in 1_usize..40,
        ) {
            let end = values.len() as f64;
            let points: Vec<_> = values.iter().enumerate().map(|(i, &v)| [i as f64, v]).collect();
            let drawn = decimate(&points, 0.0, end, columns);
            prop_assert!(drawn.len() <= 4 * columns, "{} points", drawn.len());
            let mut rest = points.iter();
            let in_order = drawn.iter().all(|point| rest.any(|other| other == point));
            prop_assert!(in_order, "points were moved, invented or reordered");
            let column = |point: &[f64; 2]| (point[0] / end * columns as f64).floor() as usize;
            for place in 0..columns {
                let all: Vec<_> = points.iter().filter(|p| column(p) == place).collect();
                for wanted in [
                    all.first(),
                    all.last(),
                    all.iter().min_by(|a, b| a[1].total_cmp(&b[1])),
                    all.iter().max_by(|a, b| a[1].total_cmp(&b[1])),
                ] {
                    let Some(wanted) = wanted else { continue };
                    let kept = drawn.iter().any(|p| column(p) == place && p[1].total_cmp(&wanted[1]).is_eq());
                    prop_assert!(kept, "column {place} lost {wanted:?}");
                }
            }
        }

        #[test]
        fn straightening_stays_within_its_tolerance(
            values in prop::collection::vec(-50.0..50.0_f64, 2..120),
            tolerance in 0.01..5.0_f64,
        ) {
            let points: Vec<_> = values.iter().enumerate().map(|(i, &v)| [i as f64, v]).collect();
            let kept = straighten(&points, tolerance);
            prop_assert_eq!(kept.first(), points.first(), "start");
            prop_assert_eq!(kept.last(), points.last(), "end");
            for point in &points {
                let nearest = kept
                    .windows(2)
                    .map(|pair| distance(*point, pair[0], pair[1]))
                    .fold(f64::INFINITY, f64::min);
                prop_assert!(nearest <= tolerance * (1.0 + 1e-9), "{point:?} is {nearest} away");
            }
        }
    }
}
