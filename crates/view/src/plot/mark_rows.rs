//! Events: which row above the panels holds which name.

use super::axis::Axis;
use super::figure::Mark;

/// Distance of a name from its line, and of a name from the next line, px.
const BESIDE: f64 = 4.0;

/// An event with its place.
#[derive(Debug, Clone, PartialEq)]
pub struct PlacedMark {
    /// Where its line stands, px.
    pub x: f64,
    /// Its row, 0 next to the panels; `None` if its name is left out.
    pub row: Option<usize>,
    /// When, s.
    pub time: f64,
    /// Its name.
    pub label: String,
    /// Width of its name, px.
    pub width: f64,
}

/// Places events by rising time. A name stands to the right of its line, and wherever the line of
/// a later event would run through it, one row further up. There are at most `most_rows` rows: in
/// a dense burst the first event of each group is named. `width` gives the width of a name, px.
#[must_use]
pub fn placed_marks(
    marks: &[Mark],
    time: &Axis,
    most_rows: usize,
    width: &dyn Fn(&str) -> f64,
) -> Vec<PlacedMark> {
    let mut placed: Vec<PlacedMark> = marks
        .iter()
        .filter(|mark| time.contains(mark.time))
        .map(|mark| PlacedMark {
            x: time.position(mark.time),
            row: Some(0),
            time: mark.time,
            label: mark.label.clone(),
            width: width(&mark.label),
        })
        .collect();
    placed.sort_by(|a, b| a.x.total_cmp(&b.x));
    leave_repetitions_unnamed(&mut placed);
    while stack(&mut placed) >= most_rows {
        let Some(crowded) = most_crowded(&placed) else {
            break;
        };
        placed[crowded].row = None;
    }
    placed
}

/// Where the same event comes again before its first name has ended, the first name stands for
/// all.
fn leave_repetitions_unnamed(placed: &mut [PlacedMark]) {
    let mut last: Option<(f64, String)> = None;
    for mark in placed {
        match &last {
            Some((end, label)) if *label == mark.label && mark.x < *end => mark.row = None,
            _ => last = Some((name_end(mark), mark.label.clone())),
        }
    }
}

/// Where the name of a mark ends, with room before the next line, px.
fn name_end(mark: &PlacedMark) -> f64 {
    mark.x + mark.width + 2.0 * BESIDE
}

/// Gives rows to all named marks from right to left; returns the highest row.
fn stack(placed: &mut [PlacedMark]) -> usize {
    let mut highest = 0;
    for index in (0..placed.len()).rev() {
        let (before, behind) = placed.split_at_mut(index + 1);
        let mark = &mut before[index];
        if mark.row.is_none() {
            continue;
        }
        let end = name_end(mark);
        let crossing = behind.iter().take_while(|other| other.x < end);
        let row = crossing
            .filter_map(|other| other.row)
            .max()
            .map_or(0, |row| row + 1);
        mark.row = Some(row);
        highest = highest.max(row);
    }
    highest
}

/// The named mark that follows its named predecessor most closely.
fn most_crowded(placed: &[PlacedMark]) -> Option<usize> {
    let named: Vec<usize> = (0..placed.len())
        .filter(|&i| placed[i].row.is_some())
        .collect();
    let distance = |pair: &[usize]| placed[pair[1]].x - placed[pair[0]].x;
    named
        .windows(2)
        .min_by(|a, b| distance(a).total_cmp(&distance(b)))
        .map(|pair| pair[1])
}

/// Rows in use.
#[must_use]
pub fn row_count(placed: &[PlacedMark]) -> usize {
    placed
        .iter()
        .filter_map(|mark| mark.row)
        .max()
        .map_or(0, |row| row + 1)
}

#[cfg(test)]
mod tests {
    use super::*;

    const MOST_ROWS: usize = 4;

    fn rows_of(marks: &[Mark]) -> Vec<PlacedMark> {
        let time = Axis::new((0.0, 10.0), (60.0, 860.0), 90.0);
        placed_marks(marks, &time, MOST_ROWS, &|label| label.len() as f64 * 6.0)
    }

    fn place(times: &[f64]) -> Vec<PlacedMark> {
        let marks: Vec<_> = times
            .iter()
            .zip(1..)
            .map(|(&time, number)| Mark {
                time,
                label: format!("relief {number} cracks"),
            })
            .collect();
        rows_of(&marks)
    }

    #[test]
    fn names_apart_share_a_row_and_close_ones_climb() {
        let rows = |times: &[f64]| -> Vec<_> { place(times).iter().map(|m| m.row).collect() };
        assert_eq!(rows(&[1.0, 5.0]), [Some(0), Some(0)], "room for both");
        assert_eq!(
            rows(&[1.0, 1.2, 5.0]),
            [Some(1), Some(0), Some(0)],
            "the earlier climbs"
        );
        assert_eq!(rows(&[12.0]), [], "outside the axis");
    }

    #[test]
    fn a_burst_names_its_first() {
        let burst: Vec<f64> = (0..40).map(|i| 2.0 + 0.01 * f64::from(i)).collect();
        let placed = place(&burst);
        assert_eq!(placed.len(), 40, "every line stays");
        assert!(placed[0].row.is_some(), "the first is named");
        assert!(
            row_count(&placed) <= MOST_ROWS,
            "{} rows",
            row_count(&placed)
        );
    }

    #[test]
    fn the_same_event_again_is_named_once() {
        let again = |time| Mark {
            time,
            label: "relief cracks".to_owned(),
        };
        let marks = [again(1.0), again(1.3), again(1.6), again(5.0)];
        let placed = rows_of(&marks);
        let rows: Vec<_> = placed.iter().map(|mark| mark.row).collect();
        assert_eq!(
            rows,
            [Some(0), None, None, Some(0)],
            "named where it is news"
        );
    }

    #[test]
    fn no_line_runs_through_a_name() {
        let placed = place(&[0.5, 0.9, 1.8, 2.0, 4.0, 4.1, 7.0]);
        for (index, mark) in placed.iter().enumerate() {
            let Some(row) = mark.row else { continue };
            let end = mark.x + mark.width;
            for other in &placed[index + 1..] {
                let reaches = other.row.is_some_and(|other_row| other_row >= row);
                assert!(!reaches || other.x > end, "{other:?} crosses {mark:?}");
            }
        }
    }
}
