//! Spans of a run in which the inputs stand still after a change.

use helmsplit_model::{Input, InputProfiles};

/// An input change and the quiet time after it.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Window {
    /// When the inputs begin to change, s.
    pub begins: f64,
    /// When they stand still again, s.
    pub quiet: f64,
    /// When they change anew, or the run ends, s.
    pub ends: f64,
}

/// Two changes closer than this (s) are one: nothing settles in between.
const JOIN: f64 = 1e-3;

/// The changes of the inputs between `from` and `to` (s), in order, each with the quiet time
/// after it. A change that lasts to the end has none and is left out.
#[must_use]
pub fn windows(inputs: &InputProfiles, from: f64, to: f64) -> Vec<Window> {
    let mut spans: Vec<(f64, f64)> = Vec::new();
    for input in Input::ALL {
        for pair in inputs.get(input).points().windows(2) {
            let ((t0, v0), (t1, v1)) = (pair[0], pair[1]);
            let changes = (v1 - v0).abs() > 0.0;
            if changes && t1 >= from && t0 < to {
                spans.push((t0.max(from), t1.min(to)));
            }
        }
    }
    spans.sort_by(|a, b| a.0.total_cmp(&b.0));
    let mut joined: Vec<(f64, f64)> = Vec::new();
    for span in spans {
        match joined.last_mut() {
            Some(last) if span.0 <= last.1 + JOIN => last.1 = last.1.max(span.1),
            _ => joined.push(span),
        }
    }
    let ends = joined.iter().skip(1).map(|s| s.0).chain([to]);
    joined
        .iter()
        .zip(ends)
        .filter(|(span, end)| *end > span.1)
        .map(|(&(begins, quiet), ends)| Window {
            begins,
            quiet,
            ends,
        })
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;
    use helmsplit_model::Profile;

    #[test]
    fn joins_ramps_of_several_inputs() {
        let mut inputs = InputProfiles::default();
        let profile = |points: &[(f64, f64)]| Profile::new(points.to_vec()).unwrap();
        inputs.set(
            Input::EngineSpeed,
            profile(&[(0.0, 90.0), (1.0, 90.0), (2.0, 240.0), (7.0, 240.0)]),
        );
        inputs.set(
            Input::WheelRate,
            profile(&[(0.0, 0.0), (2.0, 0.0), (2.05, 9.0), (4.0, 9.0), (4.0, 0.0)]),
        );
        let found = windows(&inputs, 0.0, 10.0);
        let expected = [(1.0, 2.05, 4.0), (4.0, 4.0, 10.0)];
        assert_eq!(found.len(), expected.len(), "{found:?}");
        for (window, (begins, quiet, ends)) in found.iter().zip(expected) {
            let miss = (window.begins - begins).abs()
                + (window.quiet - quiet).abs()
                + (window.ends - ends).abs();
            assert!(miss < 1e-12, "{window:?}");
        }
    }

    #[test]
    fn a_change_up_to_the_end_has_no_quiet_time() {
        let mut inputs = InputProfiles::default();
        inputs.set(
            Input::WheelRate,
            Profile::new(vec![(0.0, 0.0), (9.0, 5.0)]).unwrap(),
        );
        assert!(windows(&inputs, 0.0, 5.0).is_empty(), "still turning");
    }
}
