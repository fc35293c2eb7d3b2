//! Mending: the smallest change of one dimension, or of two, that brings a check to its limit.
//!
//! The influence of every dimension on the check's figure gives a first guess of how far each must
//! go. The most promising are then searched by runs until the check is met, and each proposal is
//! run in full, so that nothing rests on the guess; what it does to the other checks is told.
//! "Small" means the relative change, in ratios: half and double are equally far.

mod pair;
mod search;

use helmsplit_scenario::ParameterId;

use crate::check::{Check, CheckId, Limit, Status};
use crate::figure::{Ask, Figure, MAP_CHECKS, Missing};
use crate::influence::{Influence, InfluenceError, Row, Scale, influence};
use crate::sizing::Change;
use crate::study_watch::StudyWatch;

use pair::best_pair;
use search::{Direction, search};

/// What is to be mended, and how far the search goes.
#[derive(Debug, Clone, PartialEq)]
pub struct Fault {
    /// The failing check.
    pub check: CheckId,
    /// Dimensions that may be changed.
    pub parameters: Vec<ParameterId>,
    /// How many single changes are searched, the most promising first.
    pub most: usize,
    /// A dimension may become larger or smaller by at most this factor.
    pub largest_ratio: f64,
}

impl Fault {
    /// A check to be met by changing one of `parameters`: the ten most promising, each by a
    /// factor of at most 3.
    #[must_use]
    pub fn new(check: CheckId, parameters: Vec<ParameterId>) -> Self {
        Self {
            check,
            parameters,
            most: 10,
            largest_ratio: 3.0,
        }
    }
}

/// Share of a figure below which a loss of margin is not worth telling.
const WORTH_TELLING: f64 = 5e-3;

/// What a proposal does to another check.
#[derive(Debug, Clone, PartialEq)]
pub struct Effect {
    /// The check before.
    pub before: Check,
    /// The check after.
    pub after: Check,
}

impl Effect {
    /// Whether the check is worse than before: met before and not any more, without a figure, or
    /// with less margin by more than a few thousandths of the figure.
    #[must_use]
    pub fn is_worse(&self) -> bool {
        let size = self.before.figure.map_or(0.0, |figure| figure.si.abs());
        match (self.before.margin(), self.after.margin()) {
            (Some(before), Some(after)) => self.breaks() || after < before - WORTH_TELLING * size,
            (Some(_), None) => true,
            _ => false,
        }
    }

    /// Whether a check that was met fails now.
    #[must_use]
    pub fn breaks(&self) -> bool {
        self.before.status != Status::Fail && self.after.status == Status::Fail
    }
}

/// A change that meets the check, confirmed by a run.
#[derive(Debug, Clone, PartialEq)]
pub struct Proposal {
    /// The changes: one, or two for a pair.
    pub changes: Vec<Change>,
    /// Size of the change: the root of the sum of the squared logarithms of the ratios.
    pub size: f64,
    /// The check after the change, from the run.
    pub check: Check,
    /// The other checks that have a figure before or after.
    pub effects: Vec<Effect>,
}

impl Proposal {
    /// Checks that were met before and fail with it.
    pub fn broken(&self) -> impl Iterator<Item = &Effect> {
        self.effects.iter().filter(|effect| effect.breaks())
    }
}

/// Why a dimension gives no proposal.
#[derive(Debug, Clone, PartialEq)]
pub enum Dropped {
    /// Within the allowed range and the largest ratio the check is not met; the nearest figure
    /// with the value that gives it, SI.
    NotReached {
        /// The parameter.
        parameter: ParameterId,
        /// The value that comes nearest.
        value: f64,
        /// The figure there.
        figure: f64,
    },
    /// No run on the way gave the figure.
    NoFigure {
        /// The parameter.
        parameter: ParameterId,
    },
}

/// The answer.
#[derive(Debug, Clone, PartialEq)]
pub struct Mending {
    /// The check as it is.
    pub before: Check,
    /// Single changes, the smallest first.
    pub singles: Vec<Proposal>,
    /// The smallest change of two dimensions together, if it is smaller than the best single one.
    pub pair: Option<Proposal>,
    /// Dimensions that were searched without success.
    pub dropped: Vec<Dropped>,
    /// Dimensions without a resolved influence, left out of the search.
    pub unresolved: usize,
    /// Whether it was cancelled: then proposals may be missing.
    pub cancelled: bool,
}

/// Why nothing can be mended.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum MendError {
    /// The circuit as it is cannot be solved.
    #[error(transparent)]
    Missing(#[from] Missing),
    /// The check has no figure.
    #[error("the check {check} gives no figure: {reason}")]
    NoFigure {
        /// Name of the check.
        check: &'static str,
        /// Why.
        reason: String,
    },
    /// The check is met already.
    #[error("the check {0} is met already: nothing to mend")]
    Met(&'static str),
    /// The figure has no relative influences.
    #[error(transparent)]
    Influence(#[from] InfluenceError),
    /// There is nothing to change.
    #[error("no dimension is named that may be changed")]
    NothingToChange,
}

/// Looks for the smallest changes that meet a failing check.
///
/// # Errors
/// [`MendError`] if the check has no figure, is met already, or there is nothing to change.
pub fn mend(ask: &Ask<'_>, fault: &Fault, watch: &StudyWatch<'_>) -> Result<Mending, MendError> {
    if fault.parameters.is_empty() {
        return Err(MendError::NothingToChange);
    }
    let with_map = MAP_CHECKS.contains(&fault.check);
    let base = ask.checks(&[], with_map, watch)?;
    let find = |checks: &[Check]| checks.iter().find(|c| c.id == fault.check).cloned();
    let name = fault.check.name();
    let no_figure = |reason: String| MendError::NoFigure {
        check: name,
        reason,
    };
    let before = find(&base).ok_or_else(|| no_figure("unknown check".to_owned()))?;
    let (Some(limit), Some(figure)) = (before.limit, before.figure) else {
        let reason = match &before.status {
            Status::NotApplicable(reason) => reason.clone(),
            status => status.word().to_owned(),
        };
        return Err(no_figure(reason));
    };
    if before.status != Status::Fail {
        return Err(MendError::Met(name));
    }
    let figures = [Figure::Check(fault.check)];
    let found = influence(ask, &figures, &fault.parameters, watch);
    let influence = found.figures.into_iter().next();
    let influence = influence.ok_or(MendError::NothingToChange)??;
    let ways = ways(&influence, fault, gap(limit, figure.si));
    let unresolved = influence.rows.iter().filter(|row| !row.resolved).count();
    let job = search::Job {
        ask,
        watch,
        check: fault.check,
        limit,
        with_map,
        base: &base,
        figure: figure.si,
    };
    let results = watch.each("searching", &ways, |way| search(&job, way));
    let mut singles = Vec::new();
    let mut dropped = Vec::new();
    for result in results {
        match result {
            Ok(proposal) => singles.push(proposal),
            Err(reason) => dropped.extend(reason),
        }
    }
    singles.sort_by(|a, b| a.size.total_cmp(&b.size));
    let pair = best_pair(&influence, fault, gap(limit, figure.si))
        .and_then(|way| search(&job, &way).ok())
        .filter(|pair| singles.first().is_none_or(|single| pair.size < single.size));
    Ok(Mending {
        before,
        singles,
        pair,
        dropped,
        unresolved,
        cancelled: watch.is_cancelled(),
    })
}

/// Relative change of the figure that the limit asks for, as a logarithm where both have one sign.
fn gap(limit: Limit, figure: f64) -> f64 {
    let target = match limit {
        Limit::AtLeast(bound) | Limit::AtMost(bound) => bound,
        Limit::Inside(low, high) => {
            if figure < low {
                low
            } else {
                high
            }
        }
    };
    if target * figure > 0.0 {
        (target / figure).ln()
    } else {
        (target - figure) / figure.abs()
    }
}

/// The most promising single changes: those that the linear guess says are smallest.
fn ways(influence: &Influence, fault: &Fault, gap: f64) -> Vec<Direction> {
    let mut guesses: Vec<(f64, Direction)> = influence
        .rows
        .iter()
        .filter(|row| is_usable(row))
        .map(|row| {
            let guess = gap / row.sensitivity;
            let way = Direction {
                legs: vec![(row.parameter, row.value, guess.signum())],
                guess: guess.abs(),
                reach: fault.largest_ratio.ln(),
            };
            (guess.abs(), way)
        })
        .collect();
    guesses.sort_by(|a, b| a.0.total_cmp(&b.0));
    guesses.truncate(fault.most);
    guesses.into_iter().map(|(_, way)| way).collect()
}

/// Whether a row can lead a search: a sensitivity that is more than its uncertainty, of a
/// parameter that can change by a ratio.
fn is_usable(row: &Row) -> bool {
    row.scale == Scale::Value
        && row.value > 0.0
        && row.sensitivity.is_finite()
        && row.sensitivity.abs() > row.uncertainty
}
