//! Solve for: which value of one parameter gives a figure its target?
//!
//! The whole range is scanned first, in parallel, so that every root is seen and not only one;
//! each crossing is then bracketed and refined by Brent's method. Where there is no crossing, that
//! is said, with the value that comes nearest.

mod question;
mod refine;

use crate::figure::{Ask, Missing};
use crate::study_watch::StudyWatch;

pub use question::{Question, QuestionError};

use refine::refine;

/// One value of the parameter with the figure there.
#[derive(Debug, Clone, PartialEq)]
pub struct Sample {
    /// Parameter, SI.
    pub parameter: f64,
    /// Figure, SI, or why there is none.
    pub figure: Result<f64, Missing>,
}

/// What stands at a root.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum RootKind {
    /// The figure passes through the target.
    Crossing,
    /// The figure jumps over the target: it never has the value itself.
    Jump {
        /// Figure just below in the parameter, SI.
        below: f64,
        /// Figure just above, SI.
        above: f64,
    },
}

/// A value of the parameter at which the figure meets its target.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Root {
    /// Parameter, SI.
    pub parameter: f64,
    /// Figure there, SI.
    pub figure: f64,
    /// What stands there.
    pub kind: RootKind,
}

/// The answer.
#[derive(Debug, Clone, PartialEq)]
pub struct Answer {
    /// The scan, rising in the parameter.
    pub samples: Vec<Sample>,
    /// Every root, rising in the parameter. Empty if the target is not met.
    pub roots: Vec<Root>,
    /// The value of the scan whose figure comes nearest to the target; `None` if no value gives
    /// the figure.
    pub nearest: Option<(f64, f64)>,
    /// Whether it was cancelled: then roots may be missing.
    pub cancelled: bool,
    /// Runs that it took.
    pub runs: usize,
}

/// Answers a question about a scenario.
pub fn solve_for(ask: &Ask<'_>, question: &Question, watch: &StudyWatch<'_>) -> Answer {
    let axis = question.axis();
    let points = axis.points(question.points);
    let at = |value: f64| ask.figure(&question.figure, &[(question.parameter, value)], watch);
    let figures = watch.each("scanning", &points, |&(_, value)| at(value));
    let mut runs = points.len();
    let known: Vec<(f64, f64, f64)> = points
        .iter()
        .zip(&figures)
        .filter_map(|(&(share, value), figure)| {
            let figure = figure.as_ref().ok().filter(|f| f.is_finite())?;
            Some((share, value, *figure))
        })
        .collect();
    let brackets = brackets(&points, &figures, question.target);
    let refined = watch.each("refining", &brackets, |bracket| {
        refine(&axis, bracket, question.target, |value| at(value).ok())
    });
    let mut roots = Vec::new();
    for (root, calls) in refined {
        runs += calls;
        roots.extend(root);
    }
    roots.sort_by(|a, b| a.parameter.total_cmp(&b.parameter));
    let nearest = known
        .iter()
        .min_by(|a, b| {
            let miss = |point: &(f64, f64, f64)| (point.2 - question.target).abs();
            miss(a).total_cmp(&miss(b))
        })
        .map(|&(_, value, figure)| (value, figure));
    Answer {
        samples: points
            .iter()
            .zip(figures)
            .map(|(&(_, parameter), figure)| Sample { parameter, figure })
            .collect(),
        roots,
        nearest,
        cancelled: watch.is_cancelled(),
        runs,
    }
}

/// Two neighbours of the scan, each a share of the axis with the figure there, between which the
/// figure meets the target. A point that hits the target itself is both ends.
pub(crate) type Bracket = [(f64, f64); 2];

/// Neighbours on both sides of the target. A gap in the scan is no neighbourhood: nobody knows
/// what is in it.
fn brackets(points: &[(f64, f64)], figures: &[Result<f64, Missing>], target: f64) -> Vec<Bracket> {
    let value = |i: usize| figures[i].as_ref().ok().copied().filter(|f| f.is_finite());
    let mut found = Vec::new();
    for i in 0..points.len() {
        let Some(here) = value(i) else {
            continue;
        };
        let at = (points[i].0, here);
        if (here - target).abs() <= 0.0 {
            found.push([at, at]);
            continue;
        }
        if i + 1 < points.len()
            && let Some(next) = value(i + 1)
            && (here < target) != (next < target)
            && (next - target).abs() > 0.0
        {
            found.push([at, (points[i + 1].0, next)]);
        }
    }
    found
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn brackets_are_neighbours_on_both_sides() {
        let points: Vec<(f64, f64)> = (0..6).map(|i| (f64::from(i) / 5.0, f64::from(i))).collect();
        let gap = || Err(Missing::GaveUp("test".to_owned()));
        let figures = vec![Ok(0.0), Ok(2.0), Ok(1.0), Ok(0.5), gap(), Ok(3.0)];
        let found = brackets(&points, &figures, 1.0);
        assert_eq!(found.len(), 2, "{found:?}");
        assert_eq!(found[0], [(0.0, 0.0), (0.2, 2.0)], "between neighbours");
        assert_eq!(found[1][0], found[1][1], "a hit, once");
        assert!(brackets(&points, &figures, 5.0).is_empty(), "none beyond");
    }
}
