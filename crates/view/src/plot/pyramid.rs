//! Summaries of summaries, so that a line of any length is thinned in the time that its pixels
//! take.

use super::decimate::Column;

/// Points in a block of the lowest level.
const BLOCK: usize = 16;

/// Where the least and the largest value of some points stand; `None` if a value among them is
/// not finite, so that the line has a gap there.
type Extremes = Option<(usize, usize)>;

/// Least and largest values over blocks of 16 points, over pairs of blocks, over pairs of those
/// and so on. It thins a line to exactly what [`decimate`](super::decimate) gives, without looking
/// at every point.
///
/// # Examples
/// ```
/// use helmsplit_view::plot::{Pyramid, decimate};
///
/// let points: Vec<_> = (0..100_000).map(|i| [f64::from(i), f64::from(i % 997)]).collect();
/// let pyramid = Pyramid::new(&points);
/// assert_eq!(
///     pyramid.thinned(&points, 0.0, 99_999.0, 800),
///     decimate(&points, 0.0, 99_999.0, 800),
/// );
/// ```
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Pyramid {
    /// Level by level, from blocks of 16 points up to a single block.
    levels: Vec<Vec<Extremes>>,
    /// Points it was made of.
    count: usize,
    extent: Option<(f64, f64)>,
}

impl Pyramid {
    /// Summarises the points of a line (time, value). Times are finite and never decrease.
    #[must_use]
    pub fn new(points: &[[f64; 2]]) -> Self {
        let mut levels = vec![
            points
                .chunks(BLOCK)
                .enumerate()
                .map(|(block, chunk)| extremes(chunk, block * BLOCK))
                .collect::<Vec<_>>(),
        ];
        while let Some(level) = levels.last().filter(|level| level.len() > 1) {
            let joined = level.chunks(2).map(|pair| match *pair {
                [one, other] => joined(points, one?, other?),
                _ => pair[0],
            });
            let joined = joined.collect();
            levels.push(joined);
        }
        Self {
            extent: super::series::extent(
                points
                    .iter()
                    .filter(|point| point[0].is_finite() && point[1].is_finite())
                    .map(|point| point[1]),
            ),
            levels,
            count: points.len(),
        }
    }

    /// Least and largest value of the whole line; `None` if it has none.
    #[must_use]
    pub fn extent(&self) -> Option<(f64, f64)> {
        self.extent
    }

    /// The points to draw for the times `from` to `to` over `columns` pixel columns: those of
    /// [`decimate`](super::decimate). `points` are the ones it was made of; of others, nothing is
    /// drawn.
    #[must_use]
    pub fn thinned(
        &self,
        points: &[[f64; 2]],
        from: f64,
        to: f64,
        columns: usize,
    ) -> Vec<[f64; 2]> {
        if points.len() != self.count {
            return Vec::new();
        }
        let first = points.partition_point(|point| point[0] < from);
        if first == points.len() {
            return Vec::new();
        }
        let behind = first + points[first..].partition_point(|point| point[0] <= to);
        let end = (behind + 1).min(points.len());
        let place = |time: f64| ((time - from) / (to - from) * columns as f64).floor();
        let mut drawn = Vec::new();
        let mut column = Column::default();
        let mut start = first.saturating_sub(1);
        while start < end {
            let here = place(points[start][0]);
            let length = column_length(&points[start..end], |time| place(time) <= here);
            column.begin(here, &mut drawn);
            self.take(points, start, start + length, &mut column, &mut drawn);
            start += length;
        }
        column.flush(&mut drawn);
        drawn
    }

    /// Takes the points `start` to `end` into a column, by the largest blocks that fit.
    fn take(
        &self,
        points: &[[f64; 2]],
        start: usize,
        end: usize,
        column: &mut Column,
        drawn: &mut Vec<[f64; 2]>,
    ) {
        let mut at = start;
        while at < end {
            match self.block_at(at, end) {
                Some((size, (least, largest))) => {
                    column.take_block(points, (at, least, largest, at + size - 1));
                    at += size;
                }
                None => {
                    column.take_point(at, points[at], drawn);
                    at += 1;
                }
            }
        }
    }

    /// The largest block without a gap that begins at a point and ends before `end`: its size and
    /// where its extremes stand.
    fn block_at(&self, at: usize, end: usize) -> Option<(usize, (usize, usize))> {
        let mut best = None;
        let mut size = BLOCK;
        for level in &self.levels {
            if !at.is_multiple_of(size) || at + size > end {
                break;
            }
            let Some(extremes) = level[at / size] else {
                break;
            };
            best = Some((size, extremes));
            size *= 2;
        }
        best
    }
}

/// How many of the first points lie in the column of the first one: by leaps, then by halving, so
/// that neither sparse nor dense lines cost more than they must.
fn column_length(points: &[[f64; 2]], inside: impl Fn(f64) -> bool) -> usize {
    let mut leap = 1;
    while leap < points.len() && inside(points[leap][0]) {
        leap *= 2;
    }
    let (low, high) = (leap / 2, leap.min(points.len()));
    let more = points[low..high].partition_point(|point| inside(point[0]));
    // The first point lies in its own column, however times round.
    (low + more).max(1)
}

fn extremes(chunk: &[[f64; 2]], offset: usize) -> Extremes {
    let (mut least, mut largest) = (0, 0);
    for (index, point) in chunk.iter().enumerate() {
        if !(point[0].is_finite() && point[1].is_finite()) {
            return None;
        }
        if point[1] < chunk[least][1] {
            least = index;
        }
        if point[1] > chunk[largest][1] {
            largest = index;
        }
    }
    Some((offset + least, offset + largest))
}

fn joined(points: &[[f64; 2]], one: (usize, usize), other: (usize, usize)) -> Extremes {
    let value = |index: usize| points[index][1];
    // The earlier one stays among equals, as it does point by point.
    let least = if value(other.0) < value(one.0) {
        other.0
    } else {
        one.0
    };
    let largest = if value(other.1) > value(one.1) {
        other.1
    } else {
        one.1
    };
    Some((least, largest))
}

#[cfg(test)]
#[allow(clippy::float_cmp, reason = "points are copied, never computed")]
mod tests {
    use super::super::decimate::decimate;
    use super::*;
    use proptest::prelude::*;

    /// The same points bit for bit: gaps are not equal to themselves.
    fn bits(points: &[[f64; 2]]) -> Vec<[u64; 2]> {
        points.iter().map(|p| p.map(f64::to_bits)).collect()
    }

    #[test]
    fn a_spike_in_a_million_stays_at_any_zoom() {
        let mut points: Vec<_> = (0..1_000_000)
            .map(|i| [f64::from(i) * 1e-5, (f64::from(i) * 1e-4).sin()])
            .collect();
        points[654_321][1] = 40.0;
        let pyramid = Pyramid::new(&points);
        let highest = pyramid.extent().map(|(_, high)| high);
        assert_eq!(highest, Some(40.0), "of the whole line");
        for (from, to) in [(0.0, 10.0), (6.0, 7.0), (6.54, 6.55)] {
            let drawn = pyramid.thinned(&points, from, to, 900);
            assert!(drawn.contains(&points[654_321]), "{from} to {to}");
            assert_eq!(
                bits(&drawn),
                bits(&decimate(&points, from, to, 900)),
                "{from} to {to}"
            );
        }
    }

    #[test]
    fn other_points_are_not_drawn() {
        let pyramid = Pyramid::new(&[[0.0, 1.0], [1.0, 2.0]]);
        assert!(
            pyramid.thinned(&[[0.0, 1.0]], 0.0, 1.0, 10).is_empty(),
            "not its points"
        );
        assert!(
            Pyramid::new(&[]).thinned(&[], 0.0, 1.0, 10).is_empty(),
            "no points"
        );
    }

    /// Steps in time (none at a jump) and values (some of them gaps).
    fn lines() -> impl Strategy<Value = Vec<[f64; 2]>> {
        let step = prop_oneof![1 => Just(0.0), 6 => 0.0..1.0_f64, 1 => 5.0..50.0_f64];
        let value = prop_oneof![
            40 => -1e3..1e3_f64,
            // Equal values, to see which of them is kept.
            10 => (-2_i32..3).prop_map(f64::from),
            1 => Just(f64::NAN),
            1 => Just(f64::INFINITY),
        ];
        prop::collection::vec((step, value), 0..700).prop_map(|steps| {
            let mut time = 0.0;
            let point = |(step, value)| {
                time += step;
                [time, value]
            };
            steps.into_iter().map(point).collect()
        })
    }

    proptest! {
        #[test]
        fn it_gives_what_a_look_at_every_point_gives(
            points in lines(),
            from in -20.0..300.0_f64,
            span in 0.01..600.0_f64,
            columns in 1_usize..60,
        ) {
            let pyramid = Pyramid::new(&points);
            let drawn = pyramid.thinned(&points, from, from + span, columns);
            let all = decimate(&points, from, from + span, columns);
            prop_assert_eq!(bits(&drawn), bits(&all), "other points");
        }

        #[test]
        fn no_peak_is_hidden(
            points in lines(),
            from in 0.0..200.0_f64,
            span in 1.0..300.0_f64,
            columns in 1_usize..60,
        ) {
            let drawn = Pyramid::new(&points).thinned(&points, from, from + span, columns);
            let column = |t: f64| ((t - from) / span * columns as f64).floor() as i64;
            for place in 0..columns as i64 {
                let values = |points: &[[f64; 2]]| {
                    let inside = points.iter().filter(|p| {
                        p[0] >= from && p[0] <= from + span && column(p[0]) == place
                            && p[1].is_finite()
                    });
                    super::super::series::extent(inside.map(|p| p[1]))
                };
                prop_assert_eq!(values(&drawn), values(&points), "column {}", place);
            }
        }
    }
}
