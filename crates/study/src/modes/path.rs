//! Modes while one variable sweeps, each followed from step to step.

use helmsplit_scenario::Scenario;
use nalgebra::Complex;

use super::assignment::assign;
use super::error::ModesError;
use super::mode::{ModeKind, damping_of, kind};
use super::part::Part;
use crate::equilibrium::{Equilibrium, equilibrium};
use crate::error::StudyError;
use crate::operating::{OperatingPoint, Variable};

/// Values of one variable, in order.
#[derive(Debug, Clone, PartialEq)]
pub struct Sweep {
    /// What sweeps.
    pub variable: Variable,
    /// Its values, SI, growing.
    pub values: Vec<f64>,
}

impl Sweep {
    /// `count` values spread evenly from `from` to `to`, SI.
    #[must_use]
    pub fn even(variable: Variable, from: f64, to: f64, count: usize) -> Self {
        let last = count.saturating_sub(1).max(1) as f64;
        let values = (0..count).map(|i| from + (to - from) * (i as f64 / last));
        Self {
            variable,
            values: values.collect(),
        }
    }

    /// Refuses a sweep that goes nowhere.
    pub(crate) fn check(&self) -> Result<(), ModesError> {
        let grows = self.values.windows(2).all(|pair| pair[0] < pair[1]);
        let finite = self.values.iter().all(|v| v.is_finite());
        if self.values.len() >= 2 && grows && finite {
            Ok(())
        } else {
            Err(ModesError::Sweep)
        }
    }
}

/// One mode along a sweep.
#[derive(Debug, Clone, PartialEq)]
pub struct Pathway {
    /// Its eigenvalue at each value of the sweep, 1/s: real and imaginary part. A pair that stops
    /// swinging goes on as two pathways.
    pub eigenvalues: Vec<(f64, f64)>,
    /// Who swings, in words, where it is damped least.
    pub name: String,
    /// The part that takes part most there.
    pub part: Part,
}

impl Pathway {
    /// Damping ratio at each value of the sweep; `None` where it does not swing.
    pub fn damping(&self) -> impl Iterator<Item = Option<f64>> {
        self.eigenvalues.iter().map(|&(re, im)| {
            let value = Complex::new(re, im);
            (kind(value) == ModeKind::Oscillation).then(|| damping_of(value))
        })
    }

    /// Frequency of the undamped mode at each value of the sweep, Hz; `None` where it does not
    /// swing.
    pub fn frequency(&self) -> impl Iterator<Item = Option<f64>> {
        self.eigenvalues.iter().map(|&(re, im)| {
            let value = Complex::new(re, im);
            (kind(value) == ModeKind::Oscillation).then(|| value.norm() / std::f64::consts::TAU)
        })
    }

    /// Least damping ratio along the sweep, with the place in the sweep.
    #[must_use]
    pub fn least_damping(&self) -> Option<(f64, usize)> {
        self.damping()
            .enumerate()
            .filter_map(|(at, damping)| Some((damping?, at)))
            .min_by(|a, b| a.0.total_cmp(&b.0))
    }
}

/// Modes while one variable sweeps.
#[derive(Debug, Clone)]
pub struct ModePath {
    /// What sweeps.
    pub variable: Variable,
    /// Its values, SI: those asked for, and more where modes come near each other.
    pub values: Vec<f64>,
    /// The equilibrium at each value.
    pub equilibria: Vec<Equilibrium>,
    /// The modes that swing somewhere, those that come nearest to hunting first.
    pub pathways: Vec<Pathway>,
    /// Where the equilibrium was lost, SI, and why, if it was: the sweep ends before.
    pub lost: Option<(f64, String)>,
}

/// Most times that one step of a sweep is halved to tell modes apart.
const MOST_HALVINGS: u32 = 5;

/// A mode is told from its neighbours if it moves less than this share of the distance to the
/// nearest other one.
const CLEAR: f64 = 0.5;

/// Moves smaller than this, relative to the eigenvalue, are clear by themselves.
const SMALL_MOVE: f64 = 0.02;

/// One equilibrium of the sweep with its eigenvalues in the order of the pathways.
struct Station {
    value: f64,
    equilibrium: Equilibrium,
    roots: Vec<Complex<f64>>,
}

/// Follows every mode while `sweep` moves its variable away from `point`.
///
/// From one step to the next each mode goes on as the one nearest to where it was heading, all
/// matched together at the least total distance; a step in which that is not clear is halved.
///
/// # Errors
/// [`StudyError`] if there is no equilibrium at the first value, or the sweep has no values.
pub fn mode_path(
    scenario: &Scenario,
    point: &OperatingPoint,
    sweep: &Sweep,
) -> Result<ModePath, StudyError> {
    sweep.check()?;
    let at = |value: f64| -> Result<OperatingPoint, StudyError> {
        let mut there = point.clone();
        sweep.variable.apply(scenario, &mut there, value)?;
        Ok(there)
    };
    let first = equilibrium(scenario, &at(sweep.values[0])?)?;
    let roots = roots_of(&first);
    let mut stations = vec![Station {
        value: sweep.values[0],
        equilibrium: first,
        roots,
    }];
    let mut lost = None;
    'sweep: for &target in &sweep.values[1..] {
        // Values still to be reached, the next one last.
        let mut waiting = vec![(target, 0_u32)];
        while let Some((value, halvings)) = waiting.pop() {
            let here = &stations[stations.len() - 1];
            let next = match here.equilibrium.follow(scenario, &at(value)?) {
                Ok(next) => next,
                Err(StudyError::Equilibrium(error)) => {
                    lost = Some((value, error.to_string()));
                    break 'sweep;
                }
                Err(other) => return Err(other),
            };
            let (roots, clear) = matched(&stations, value, &roots_of(&next));
            if clear || halvings >= MOST_HALVINGS {
                stations.push(Station {
                    value,
                    equilibrium: next,
                    roots,
                });
            } else {
                waiting.push((value, halvings + 1));
                waiting.push((0.5 * (here.value + value), halvings + 1));
            }
        }
    }
    let pathways = pathways(&stations)?;
    let (values, equilibria) = stations
        .into_iter()
        .map(|station| (station.value, station.equilibrium))
        .unzip();
    Ok(ModePath {
        variable: sweep.variable,
        values,
        equilibria,
        pathways,
        lost,
    })
}

fn roots_of(equilibrium: &Equilibrium) -> Vec<Complex<f64>> {
    let values = equilibrium.stability.eigenvalues.iter();
    values.map(|&(re, im)| Complex::new(re, im)).collect()
}

/// Distance of two eigenvalues relative to their size, so that slow modes count as fast ones do.
fn distance(a: Complex<f64>, b: Complex<f64>) -> f64 {
    (a - b).norm() / (a.norm() + b.norm() + 1.0)
}

/// The eigenvalues at `value` in the order of the pathways so far, and whether that is clear.
fn matched(stations: &[Station], value: f64, found: &[Complex<f64>]) -> (Vec<Complex<f64>>, bool) {
    let here = &stations[stations.len() - 1];
    let size = here.roots.len();
    if found.len() != size {
        return (found.to_vec(), true);
    }
    let heading = |i: usize| match stations.len().checked_sub(2).map(|at| &stations[at]) {
        Some(before) => {
            let step = (value - here.value) / (here.value - before.value);
            here.roots[i] + (here.roots[i] - before.roots[i]) * step.clamp(0.0, 1.0)
        }
        None => here.roots[i],
    };
    let mut costs = Vec::with_capacity(size * size);
    for i in 0..size {
        let expected = heading(i);
        costs.extend(found.iter().map(|&root| distance(expected, root)));
    }
    let columns = assign(&costs, size);
    let clear = (0..size).all(|i| {
        let own = costs[i * size + columns[i]];
        let other = (0..size)
            .filter(|&j| j != columns[i])
            .map(|j| costs[i * size + j])
            .fold(f64::INFINITY, f64::min);
        own <= SMALL_MOVE || own <= CLEAR * other
    });
    (columns.into_iter().map(|j| found[j]).collect(), clear)
}

/// The pathways that swing somewhere, one of each conjugate pair, with their names.
fn pathways(stations: &[Station]) -> Result<Vec<Pathway>, StudyError> {
    let size = stations[0].roots.len();
    let mut all: Vec<(f64, Pathway)> = Vec::new();
    for i in 0..size {
        let way: Vec<(f64, f64)> = stations
            .iter()
            .filter_map(|station| station.roots.get(i))
            .map(|root| (root.re, root.im))
            .collect();
        let mut pathway = Pathway {
            eigenvalues: way,
            name: String::new(),
            part: Part::Other,
        };
        // Its mirror image is told by the other one of the pair.
        if !pathway.eigenvalues.iter().any(|&(_, im)| im > 0.0) {
            continue;
        }
        let Some((least, at)) = pathway.least_damping() else {
            continue;
        };
        let (re, im) = pathway.eigenvalues[at];
        let modes = stations[at].equilibrium.modes()?;
        let nearest = modes.oscillations().min_by(|a, b| {
            let far = |m: &super::Mode| {
                distance(
                    Complex::new(m.eigenvalue.0, m.eigenvalue.1),
                    Complex::new(re, im.abs()),
                )
            };
            far(a).total_cmp(&far(b))
        });
        if let Some(mode) = nearest {
            pathway.name = mode.name();
            pathway.part = mode.shares.first().map_or(Part::Other, |share| share.part);
        }
        all.push((least, pathway));
    }
    all.sort_by(|a, b| a.0.total_cmp(&b.0));
    Ok(all.into_iter().map(|(_, pathway)| pathway).collect())
}
