//! Where the names of limits stand.

use super::axis::Axis;
use super::figure::{Limit, Where};

/// From a limit's line up to its name's baseline, and down to it, px.
const ABOVE: f64 = 4.0;
const BELOW: f64 = 11.0;

/// Height of a name over its baseline and below it, px.
const ASCENT: f64 = 8.5;
const DESCENT: f64 = 2.5;

/// Distance from the edges of the plot, px.
const INSET: f64 = 4.0;

/// Names wander along their line in so many steps to find a free place.
const STEPS: usize = 8;

/// A name over another one is worse than a name over any number of lines.
const OVERLAP: f64 = 1e6;

/// What a step away from the right edge costs, against one line crossed: the right edge is where
/// names are looked for.
const WANDERING: f64 = 0.2;

/// A rectangle on paper, px.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Frame {
    /// Left edge.
    pub left: f64,
    /// Right edge.
    pub right: f64,
    /// Upper edge.
    pub top: f64,
    /// Lower edge, below the upper one.
    pub bottom: f64,
}

impl Frame {
    /// Whether the two share more than an edge.
    #[must_use]
    pub fn meets(&self, other: &Self) -> bool {
        self.left < other.right
            && other.left < self.right
            && self.top < other.bottom
            && other.top < self.bottom
    }

    /// Whether the stretch from `a` to `b` runs through (Liang & Barsky 1984, ACM Transactions on
    /// Graphics 3, 1-22).
    #[must_use]
    pub fn is_crossed(&self, a: [f64; 2], b: [f64; 2]) -> bool {
        // Most stretches are far away.
        if a[0].max(b[0]) < self.left
            || a[0].min(b[0]) > self.right
            || a[1].max(b[1]) < self.top
            || a[1].min(b[1]) > self.bottom
        {
            return false;
        }
        let (dx, dy) = (b[0] - a[0], b[1] - a[1]);
        let (mut enters, mut leaves) = (0.0_f64, 1.0_f64);
        for (towards, room) in [
            (-dx, a[0] - self.left),
            (dx, self.right - a[0]),
            (-dy, a[1] - self.top),
            (dy, self.bottom - a[1]),
        ] {
            if towards == 0.0 {
                if room < 0.0 {
                    return false;
                }
            } else if towards < 0.0 {
                enters = enters.max(room / towards);
            } else {
                leaves = leaves.min(room / towards);
            }
        }
        enters <= leaves
    }
}

/// A limit's name placed.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PlacedName {
    /// Left end of the baseline, px.
    pub at: (f64, f64),
    /// What the letters cover, px.
    pub frame: Frame,
    /// How often lines of data run through it.
    pub crossings: usize,
}

/// Where the names of limits stand: on their own line, where they cross the fewest lines of data
/// and no other name. `widths` are those of the names, `lines` is the data on paper, px. `None` for
/// a limit out of view.
#[must_use]
pub fn placed_names(
    limits: &[Limit],
    widths: &[f64],
    values: &Axis,
    plot: Frame,
    lines: &[Vec<[f64; 2]>],
) -> Vec<Option<PlacedName>> {
    let mut placed: Vec<Option<PlacedName>> = Vec::new();
    for (limit, &width) in limits.iter().zip(widths) {
        let name = baselines(limit, values, plot)
            .into_iter()
            .flat_map(|baseline| places(baseline, width, plot))
            .map(|(name, wandering)| {
                let others = placed.iter().flatten();
                let overlaps = others
                    .filter(|other| other.frame.meets(&name.frame))
                    .count();
                let crossings = lines
                    .iter()
                    .flat_map(|line| line.windows(2))
                    .filter(|pair| name.frame.is_crossed(pair[0], pair[1]))
                    .count();
                let cost = OVERLAP * overlaps as f64 + crossings as f64 + wandering;
                (PlacedName { crossings, ..name }, cost)
            })
            .min_by(|a, b| a.1.total_cmp(&b.1));
        placed.push(name.map(|(name, _)| name));
    }
    placed
}

/// Baselines that a limit offers, the best first.
fn baselines(limit: &Limit, values: &Axis, plot: Frame) -> Vec<f64> {
    let wanted = match limit.at {
        Where::Line(value) if values.contains(value) => {
            let y = values.position(value);
            vec![y - ABOVE, y + BELOW]
        }
        Where::Band(from, to) if from <= values.high && to >= values.low => {
            let upper = values.position(to.min(values.high));
            let lower = values.position(from.max(values.low));
            vec![upper + BELOW, lower - ABOVE]
        }
        Where::Line(_) | Where::Band(..) => Vec::new(),
    };
    let inside: Vec<f64> = wanted
        .iter()
        .copied()
        .filter(|y| y - ASCENT >= plot.top && y + DESCENT <= plot.bottom)
        .collect();
    // A limit at both edges of a flat panel has no baseline inside; it may look out then.
    if inside.is_empty() { wanted } else { inside }
}

/// Places along a baseline from right to left, each with the cost of having wandered there.
fn places(y: f64, width: f64, plot: Frame) -> impl Iterator<Item = (PlacedName, f64)> {
    let free = (plot.right - plot.left - width - 2.0 * INSET).max(0.0);
    (0..=STEPS).map(move |step| {
        let left = plot.right - INSET - width - free * step as f64 / STEPS as f64;
        let frame = Frame {
            left,
            right: left + width,
            top: y - ASCENT,
            bottom: y + DESCENT,
        };
        let name = PlacedName {
            at: (left, y),
            frame,
            crossings: 0,
        };
        (name, WANDERING * step as f64)
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::plot::Reach;

    const PLOT: Frame = Frame {
        left: 60.0,
        right: 860.0,
        top: 0.0,
        bottom: 100.0,
    };

    fn names(at: &[Where], lines: &[Vec<[f64; 2]>]) -> Vec<Option<PlacedName>> {
        let limits: Vec<_> = at
            .iter()
            .map(|&at| Limit {
                label: String::new(),
                at,
                reach: Reach::IfInView,
            })
            .collect();
        let widths = vec![80.0; limits.len()];
        let values = Axis::new((0.0, 100.0), (100.0, 0.0), 25.0);
        placed_names(&limits, &widths, &values, PLOT, lines)
    }

    #[test]
    fn names_stand_at_the_right_unless_something_is_there() {
        let free = names(&[Where::Line(50.0)], &[])[0].unwrap();
        assert!((free.at.0 - 776.0).abs() < 1e-9, "at the right: {free:?}");
        let line = vec![[700.0, 100.0], [860.0, 0.0]];
        let moved = names(&[Where::Line(50.0)], std::slice::from_ref(&line))[0].unwrap();
        assert!(
            !moved.frame.is_crossed(line[0], line[1]),
            "free of the line: {moved:?}"
        );
    }

    #[test]
    fn names_of_close_limits_do_not_overlap() {
        let placed = names(
            &[
                Where::Line(50.0),
                Where::Line(52.0),
                Where::Band(48.0, 60.0),
            ],
            &[],
        );
        let frames: Vec<_> = placed.iter().flatten().map(|name| name.frame).collect();
        assert_eq!(frames.len(), 3, "all are named");
        for (index, frame) in frames.iter().enumerate() {
            assert!(
                !frames[..index].iter().any(|other| other.meets(frame)),
                "overlap: {frames:?}"
            );
        }
    }

    #[test]
    fn limits_out_of_view_have_no_name_and_edges_keep_inside() {
        let placed = names(
            &[Where::Line(150.0), Where::Line(100.0), Where::Line(0.0)],
            &[],
        );
        assert_eq!(placed[0], None, "out of view");
        for name in placed.iter().flatten() {
            assert!(
                name.frame.top >= 0.0 && name.frame.bottom <= 100.0,
                "inside: {name:?}"
            );
        }
    }

    #[test]
    fn crossing_is_exact() {
        let frame = Frame {
            left: 0.0,
            right: 10.0,
            top: 0.0,
            bottom: 10.0,
        };
        for (a, b, crossed) in [
            ([-5.0, 5.0], [15.0, 5.0], true),
            ([-5.0, 11.0], [15.0, 11.0], false),
            ([5.0, -5.0], [5.0, -1.0], false),
            ([3.0, 3.0], [4.0, 4.0], true),
            ([-3.0, 8.0], [1.0, 12.0], false),
        ] {
            assert_eq!(frame.is_crossed(a, b), crossed, "{a:?} to {b:?}");
        }
    }
}
