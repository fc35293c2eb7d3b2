//! From a bracket to a root.

use super::{Bracket, Root, RootKind};
use crate::brent::root_between;
use crate::parameter_scale::ParameterScale;

/// A root is placed to this share of the range.
const TOLERANCE: f64 = 1e-7;

/// Most runs for one root.
const MOST_CALLS: usize = 40;

/// Where the figure still misses its target by this share of what the bracket spans, it jumps.
const JUMP: f64 = 0.02;

/// The root in a bracket, with the runs that it took. `None` where a run on the way gives no
/// figure.
pub(super) fn refine(
    axis: &ParameterScale,
    bracket: &Bracket,
    target: f64,
    figure: impl Fn(f64) -> Option<f64>,
) -> (Option<Root>, usize) {
    let [low, high] = *bracket;
    let root = |share: f64, figure: f64, kind: RootKind| Root {
        parameter: axis.at(share),
        figure,
        kind,
    };
    if low.0.to_bits() == high.0.to_bits() {
        return (Some(root(low.0, low.1, RootKind::Crossing)), 0);
    }
    if axis.is_whole() {
        // Between two whole numbers there is nothing.
        let (below, above) = (low.1, high.1);
        let nearer = if (below - target).abs() < (above - target).abs() {
            low
        } else {
            high
        };
        let kind = RootKind::Jump { below, above };
        return (Some(root(nearer.0, nearer.1, kind)), 0);
    }
    let ends = [(low.0, low.1 - target), (high.0, high.1 - target)];
    let found = root_between(ends, TOLERANCE, MOST_CALLS, |share| {
        Some(figure(axis.at(share))? - target)
    });
    let Some(found) = found else {
        return (None, MOST_CALLS);
    };
    let [below, above] = found.bracket;
    let nearer = if below.1.abs() < above.1.abs() {
        below
    } else {
        above
    };
    let span = (high.1 - low.1).abs();
    let (at, kind) = if nearer.1.abs() > JUMP * span {
        let kind = RootKind::Jump {
            below: below.1 + target,
            above: above.1 + target,
        };
        (nearer, kind)
    } else {
        ((found.at, found.value), RootKind::Crossing)
    };
    (Some(root(at.0, at.1 + target, kind)), found.calls)
}

#[cfg(test)]
mod tests {
    use super::*;
    use helmsplit_scenario::parameter::{pump, valve_edges};

    #[test]
    fn a_smooth_figure_is_crossed_and_a_step_is_a_jump() {
        let axis = ParameterScale::new(valve_edges::FIXED_ORIFICE_DIAMETER, 1e-3, 12e-3);
        let square = |d: f64| Some(d * d * 1e6);
        let ends = [(0.0, 1.0), (1.0, 144.0)];
        let (root, calls) = refine(&axis, &ends, 13.69, square);
        let root = root.unwrap();
        assert!((root.parameter - 3.7e-3).abs() < 1e-8, "{root:?}");
        assert_eq!(root.kind, RootKind::Crossing, "{root:?}");
        assert!(calls > 0 && calls < 20, "{calls}");
        let step = |d: f64| Some(if d < 5e-3 { 1.0 } else { 144.0 });
        let (root, _) = refine(&axis, &ends, 13.69, step);
        let root = root.unwrap();
        let jump = RootKind::Jump {
            below: 1.0,
            above: 144.0,
        };
        assert_eq!(root.kind, jump, "{root:?}");
        assert!((root.parameter - 5e-3).abs() < 1e-7, "{root:?}");
    }

    #[test]
    fn whole_numbers_are_not_split() {
        let axis = ParameterScale::new(pump::TEETH, 8.0, 12.0);
        let ends = [(0.25, 3.0), (0.5, 7.0)];
        let (root, calls) = refine(&axis, &ends, 4.0, |_| None);
        let root = root.unwrap();
        assert_eq!(
            (root.parameter, root.figure, calls),
            (9.0, 3.0, 0),
            "{root:?}"
        );
    }
}
