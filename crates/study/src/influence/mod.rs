//! Influence: which parameter moves a figure, and how much.
//!
//! The relative sensitivity `(dF / F) / (dp / p)` by central differences: 2 means that one per
//! cent more of the parameter makes two per cent more of the figure. A run has noise, since the
//! solver chooses its steps anew for each variant; so the step follows the noise, a second step of
//! half the size checks the first, and what both do not agree on is marked as not resolved.

mod designable;
mod difference;

use helmsplit_model::Quantity;
use helmsplit_scenario::{ParameterId, Scenario};
use helmsplit_sim::SolverOptions;

use crate::figure::{Ask, Figure, Missing};
use crate::parameter_scale::usual_range;
use crate::study_watch::StudyWatch;

pub use designable::{design_parameters, varied_parameters};
use difference::{Plan, Sensitivity};

/// What a relative change of a parameter refers to.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Scale {
    /// Its own value.
    Value,
    /// The width of its usual range: the value is 0, or its zero means nothing (temperature).
    UsualRange,
}

/// One parameter's influence on one figure.
#[derive(Debug, Clone, PartialEq)]
pub struct Row {
    /// The parameter.
    pub parameter: ParameterId,
    /// Its value, SI.
    pub value: f64,
    /// What a relative change of it refers to.
    pub scale: Scale,
    /// Relative change of the figure per relative change of the parameter; not a number where
    /// the variants gave no figure.
    pub sensitivity: f64,
    /// How far it may be off: difference between both steps, and noise over step.
    pub uncertainty: f64,
    /// Relative step of the parameter.
    pub step: f64,
    /// Whether both steps agree: else only the order of size counts, if that.
    pub resolved: bool,
    /// Why there is no sensitivity.
    pub missing: Option<Missing>,
}

/// Influence of every parameter on one figure.
#[derive(Debug, Clone, PartialEq)]
pub struct Influence {
    /// The figure.
    pub figure: Figure,
    /// The figure of the circuit as it is, SI.
    pub base: f64,
    /// Relative noise of the figure: what it changes by when only the solver's tolerance does.
    pub noise: f64,
    /// Parameters, the most influential first; those without a sensitivity last.
    pub rows: Vec<Row>,
}

/// What a study of influence gives.
#[derive(Debug, Clone, PartialEq)]
pub struct Influences {
    /// One for each figure, in their order, or why there is none.
    pub figures: Vec<Result<Influence, InfluenceError>>,
    /// Whether it was cancelled: then it is not whole.
    pub cancelled: bool,
    /// Runs that it took.
    pub runs: usize,
}

/// Why a figure has no influences.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum InfluenceError {
    /// The circuit as it is gives no figure.
    #[error("the circuit as it is gives no {figure}: {missing}")]
    NoBase {
        /// Id of the figure.
        figure: String,
        /// Why.
        missing: Missing,
    },
    /// The figure is zero: nothing is relative to it.
    #[error("{figure} is zero: a relative influence on it has no meaning")]
    Zero {
        /// Id of the figure.
        figure: String,
    },
}

/// Share of the tolerance with which the base run is repeated to see the noise.
const FINER: f64 = 0.25;

/// Noise that a run has at least, in tolerances of the solver.
const LEAST_NOISE: f64 = 3.0;

/// Influence of `parameters` on `figures` about the scenario as it is. All figures are taken from
/// the same runs: four a parameter, and two for the base.
pub fn influence(
    ask: &Ask<'_>,
    figures: &[Figure],
    parameters: &[ParameterId],
    watch: &StudyWatch<'_>,
) -> Influences {
    let bases = bases(ask, figures, watch);
    let noise = bases
        .iter()
        .filter_map(|base| base.as_ref().ok().map(|(_, noise)| *noise))
        .fold(0.0, f64::max);
    let plans: Vec<Plan> = parameters
        .iter()
        .map(|&id| Plan::new(id, ask.scenario.si(id), scale_of(id, ask.scenario), noise))
        .collect();
    let variants: Vec<(usize, f64)> = plans
        .iter()
        .enumerate()
        .flat_map(|(place, plan)| plan.values().map(move |value| (place, value)))
        .collect();
    let answers = watch.each("varying", &variants, |&(place, value)| {
        let change = [(plans[place].id, value)];
        ask.figures(figures, &change, watch)
    });
    let figures_out = figures
        .iter()
        .enumerate()
        .zip(bases)
        .map(|((column, figure), base)| {
            let (base, noise) = base?;
            let rows = plans.iter().enumerate().map(|(place, plan)| {
                // Values of one plan stand together, in its order.
                let first = 4 * place;
                let values = std::array::from_fn(|i| answers[first + i][column].clone());
                row(plan, ask.scenario, &plan.sensitivity(base, noise, values))
            });
            let mut rows: Vec<Row> = rows.collect();
            rows.sort_by(|a, b| rank(b).total_cmp(&rank(a)));
            Ok(Influence {
                figure: figure.clone(),
                base,
                noise,
                rows,
            })
        })
        .collect();
    Influences {
        figures: figures_out,
        cancelled: watch.is_cancelled(),
        runs: variants.len() + 2,
    }
}

/// Size of a sensitivity for ranking; what has none comes last.
fn rank(row: &Row) -> f64 {
    if row.sensitivity.is_finite() {
        row.sensitivity.abs()
    } else {
        -1.0
    }
}

fn row(plan: &Plan, scenario: &Scenario, found: &Result<Sensitivity, Missing>) -> Row {
    let (sensitivity, uncertainty, resolved, missing) = match found {
        Ok(s) => (s.value, s.uncertainty, s.resolved, None),
        Err(missing) => (f64::NAN, f64::NAN, false, Some(missing.clone())),
    };
    Row {
        parameter: plan.id,
        value: scenario.si(plan.id),
        scale: plan.scale,
        sensitivity,
        uncertainty,
        step: plan.step,
        resolved,
        missing,
    }
}

/// Figures of the circuit as it is, each with its relative noise: what it changes by when only the
/// solver's tolerance does.
fn bases(
    ask: &Ask<'_>,
    figures: &[Figure],
    watch: &StudyWatch<'_>,
) -> Vec<Result<(f64, f64), InfluenceError>> {
    let tolerance = ask.options.relative_tolerance;
    let finer = Ask {
        options: SolverOptions {
            // The solver takes no tolerance below this.
            relative_tolerance: (FINER * tolerance).max(1e-12),
            ..ask.options.clone()
        },
        ..ask.clone()
    };
    let both = watch.each("base", &[ask, &finer], |ask| {
        ask.figures(figures, &[], watch)
    });
    figures
        .iter()
        .enumerate()
        .map(|(column, figure)| {
            let base = both[0][column].clone();
            let base = base.map_err(|missing| InfluenceError::NoBase {
                figure: figure.to_string(),
                missing,
            })?;
            if base.abs() <= 0.0 || !base.is_finite() {
                return Err(InfluenceError::Zero {
                    figure: figure.to_string(),
                });
            }
            let change = both[1][column]
                .as_ref()
                .map_or(0.0, |fine| (fine - base).abs());
            Ok((base, (change / base.abs()).max(LEAST_NOISE * tolerance)))
        })
        .collect()
}

/// What a relative change refers to.
fn scale_of(id: ParameterId, scenario: &Scenario) -> Scale {
    let zero = scenario.si(id).abs() <= 0.0;
    let shifted = id.parameter().quantity == Quantity::Temperature;
    if zero || shifted {
        Scale::UsualRange
    } else {
        Scale::Value
    }
}

/// The size that a relative change of a parameter refers to, SI.
#[must_use]
pub fn reference_size(id: ParameterId, scale: Scale, value: f64) -> f64 {
    match scale {
        Scale::Value => value.abs(),
        Scale::UsualRange => {
            let (low, high) = usual_range(id);
            high - low
        }
    }
}
