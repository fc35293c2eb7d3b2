//! Where a map needs more grid lines.

use super::cell::Spot;
use super::layer::Layer;

/// Layers whose bends count.
const WATCHED: [Layer; 4] = [
    Layer::PriorityFlow,
    Layer::Damping,
    Layer::Travel,
    Layer::InletPressure,
];

/// An interval is not halved below this share of the axis.
const NARROWEST: f64 = 1.0 / 400.0;

/// Adds lines between `lines` (growing) until there are `wanted`, each in the middle of the
/// interval with the largest bend at its ends times its width. `value(layer, line, across)` reads a
/// layer at a line and a place across it; there are `across` places.
pub(super) fn refined(
    lines: &[f64],
    across: usize,
    wanted: usize,
    value: &dyn Fn(Layer, usize, usize) -> f64,
) -> Vec<f64> {
    let count = lines.len();
    if count < 3 || wanted <= count {
        return lines.to_vec();
    }
    let span = lines[count - 1] - lines[0];
    let bends = bends(lines, across, value);
    // Interval with its weight; halving one halves the bend that is left in each half.
    let mut intervals: Vec<(f64, f64, f64)> = (0..count - 1)
        .map(|i| (lines[i], lines[i + 1], bends[i].max(bends[i + 1])))
        .collect();
    for _ in count..wanted {
        let widest = (0..intervals.len())
            .filter(|&i| intervals[i].1 - intervals[i].0 > 2.0 * NARROWEST * span)
            .max_by(|&a, &b| weight(&intervals[a], span).total_cmp(&weight(&intervals[b], span)));
        let Some(i) = widest else { break };
        let (from, to, bend) = intervals[i];
        let middle = 0.5 * (from + to);
        intervals[i] = (from, middle, 0.5 * bend);
        intervals.insert(i + 1, (middle, to, 0.5 * bend));
    }
    let mut all: Vec<f64> = intervals.iter().map(|interval| interval.0).collect();
    all.push(lines[count - 1]);
    all
}

/// A straight layer still deserves lines, evenly: the width counts a little by itself.
fn weight(&(from, to, bend): &(f64, f64, f64), span: f64) -> f64 {
    bend + 0.05 * (to - from) / span
}

/// Largest change of slope across each line, in shares of the range of its layer: 1 for a layer
/// that turns from flat to its whole range within one interval. The ends have none of their own.
fn bends(lines: &[f64], across: usize, value: &dyn Fn(Layer, usize, usize) -> f64) -> Vec<f64> {
    let count = lines.len();
    let mut bends = vec![0.0_f64; count];
    for layer in WATCHED {
        let all = (0..count).flat_map(|i| (0..across).map(move |j| (i, j)));
        let (low, high) = all
            .map(|(i, j)| value(layer, i, j))
            .filter(|v| v.is_finite())
            .fold((f64::INFINITY, f64::NEG_INFINITY), |(low, high), v| {
                (low.min(v), high.max(v))
            });
        let range = high - low;
        if !(range > 0.0 && range.is_finite()) {
            continue;
        }
        for i in 1..count - 1 {
            for j in 0..across {
                let [before, here, after] = [i - 1, i, i + 1].map(|i| value(layer, i, j));
                let share = (lines[i] - lines[i - 1]) / (lines[i + 1] - lines[i - 1]);
                let straight = before + share * (after - before);
                let bend = (here - straight).abs() / range;
                if bend.is_finite() {
                    bends[i] = bends[i].max(bend);
                } else if here.is_finite() != straight.is_finite() {
                    // The edge of where there is an equilibrium at all.
                    bends[i] = 1.0;
                }
            }
        }
    }
    bends
}

/// A layer at a spot; not a number where nothing is known.
pub(super) fn value(spot: &Spot, layer: Layer) -> f64 {
    spot.cell().map_or(f64::NAN, |cell| layer.value(cell))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn lines_gather_at_a_kink() {
        let lines: Vec<f64> = (0..11).map(f64::from).collect();
        // Flat up to 4, then steep.
        let value = |_: Layer, i: usize, _: usize| (i as f64 - 4.0).max(0.0);
        let all = refined(&lines, 3, 21, &value);
        assert_eq!(all.len(), 21, "{all:?}");
        assert!(all.windows(2).all(|p| p[0] < p[1]), "in order: {all:?}");
        let near = all.iter().filter(|&&x| (3.0..=5.0).contains(&x)).count();
        assert!(near >= 8, "{near} lines about the kink: {all:?}");
        for line in lines {
            assert!(
                all.iter().any(|x| (x - line).abs() < 1e-12),
                "{line} is kept: {all:?}"
            );
        }
    }

    #[test]
    fn a_plane_is_spread_evenly() {
        let lines: Vec<f64> = (0..6).map(f64::from).collect();
        let all = refined(&lines, 1, 11, &|_, i, _| i as f64);
        let widest = all.windows(2).map(|p| p[1] - p[0]).fold(0.0, f64::max);
        assert!((widest - 0.5).abs() < 1e-12, "{all:?}");
    }
}
