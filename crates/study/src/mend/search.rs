//! Goes along one direction until the check is met, and confirms it by a run.

use helmsplit_scenario::ParameterId;

use super::{Dropped, Effect, Proposal};
use crate::brent::root_between;
use crate::check::{Check, CheckId, Limit, Status};
use crate::figure::{Ask, Figure};
use crate::parameter_scale::is_allowed;
use crate::sizing::Change;
use crate::study_watch::StudyWatch;

/// A direction in the logarithms of parameters.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Direction {
    /// Parameter, value (SI), share of the direction; the squares of the shares add up to 1.
    pub(super) legs: Vec<(ParameterId, f64, f64)>,
    /// How far the linear guess says to go, in logarithms of ratios.
    pub(super) guess: f64,
    /// How far to go at most.
    pub(super) reach: f64,
}

impl Direction {
    /// The values at a distance, SI; `None` if one is not allowed.
    fn at(&self, distance: f64) -> Option<Vec<(ParameterId, f64)>> {
        self.legs
            .iter()
            .map(|&(id, value, share)| {
                let moved = value * (share * distance).exp();
                is_allowed(id, moved).then_some((id, moved))
            })
            .collect()
    }
}

/// What a search needs to know.
pub(super) struct Job<'a> {
    pub(super) ask: &'a Ask<'a>,
    pub(super) watch: &'a StudyWatch<'a>,
    pub(super) check: CheckId,
    pub(super) limit: Limit,
    /// Whether the operating map is looked at.
    pub(super) with_map: bool,
    pub(super) base: &'a [Check],
    /// Figure of the check as it is, SI.
    pub(super) figure: f64,
}

/// First try, as a share of the linear guess.
const FIRST: f64 = 0.5;

/// Each try goes so much farther than the one before.
const FARTHER: f64 = 1.6;

/// The first try goes at least so far, a logarithm: one per cent.
const LEAST: f64 = 0.01;

/// The distance at which the check is met is found to this, a logarithm.
const TOLERANCE: f64 = 2e-4;

/// Most runs that close in on it.
const MOST_CALLS: usize = 14;

impl Job<'_> {
    fn figure(&self, way: &Direction, distance: f64) -> Option<f64> {
        let changes = way.at(distance)?;
        let figure = Figure::Check(self.check);
        let number = self.ask.figure(&figure, &changes, self.watch).ok()?;
        number.is_finite().then_some(number)
    }

    /// Margin to the limit, negative while the check fails.
    fn margin(&self, figure: f64) -> f64 {
        self.limit.margin(figure)
    }
}

/// Goes outward from the circuit as it is, then closes in between the last failing and the first
/// met distance.
pub(super) fn search(job: &Job<'_>, way: &Direction) -> Result<Proposal, Option<Dropped>> {
    let mut failing = (0.0, job.margin(job.figure));
    let mut nearest: Option<(f64, f64)> = None;
    let mut distance = (FIRST * way.guess).max(LEAST);
    let met = loop {
        if job.watch.is_cancelled() {
            return Err(None);
        }
        let step = distance.min(way.reach);
        if let Some(figure) = job.figure(way, step) {
            let margin = job.margin(figure);
            if nearest.is_none_or(|(_, best)| margin > job.margin(best)) {
                nearest = Some((step, figure));
            }
            if margin >= 0.0 {
                break (step, margin);
            }
            failing = (step, margin);
        }
        if step >= way.reach {
            return Err(Some(dropped(way, nearest)));
        }
        distance *= FARTHER;
    };
    let distance = close_in(job, way, failing, met);
    confirmed(job, way, distance).ok_or(Some(dropped(way, nearest)))
}

/// The smallest distance at which the check is met, as far as the search sees: the met end of the
/// last bracket.
fn close_in(job: &Job<'_>, way: &Direction, failing: (f64, f64), met: (f64, f64)) -> f64 {
    let found = root_between([failing, met], TOLERANCE, MOST_CALLS, |distance| {
        Some(job.margin(job.figure(way, distance)?))
    });
    let ends = found.map_or([failing, met], |found| found.bracket);
    ends.into_iter()
        .filter(|(_, margin)| *margin >= 0.0)
        .map(|(distance, _)| distance)
        .fold(met.0, f64::min)
}

/// The proposal at a distance, from a full run of it; `None` if the run does not confirm it.
fn confirmed(job: &Job<'_>, way: &Direction, distance: f64) -> Option<Proposal> {
    let moved = way.at(distance)?;
    let checks = job.ask.checks(&moved, job.with_map, job.watch).ok()?;
    let check = checks.iter().find(|c| c.id == job.check)?.clone();
    if !matches!(check.status, Status::Pass | Status::Near) {
        return None;
    }
    let changes = moved
        .into_iter()
        .zip(&way.legs)
        .map(|((id, to), &(_, from, _))| Change { id, from, to })
        .collect();
    let effects = job
        .base
        .iter()
        .zip(checks)
        .filter(|(before, after)| {
            before.id != job.check && (before.figure.is_some() || after.figure.is_some())
        })
        .map(|(before, after)| Effect {
            before: before.clone(),
            after,
        })
        .collect();
    Some(Proposal {
        changes,
        size: distance,
        check,
        effects,
    })
}

fn dropped(way: &Direction, nearest: Option<(f64, f64)>) -> Dropped {
    let (parameter, value, share) = way.legs[0];
    match nearest {
        Some((distance, figure)) => Dropped::NotReached {
            parameter,
            value: value * (share * distance).exp(),
            figure,
        },
        None => Dropped::NoFigure { parameter },
    }
}
