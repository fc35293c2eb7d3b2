//! One mode, and all modes of an equilibrium.

use std::f64::consts::TAU;

use nalgebra::Complex;

use super::eigen::{Linear, Vectors};
use super::error::ModesError;
use super::part::{Part, Share};
use super::{NEUTRAL, SLOWEST_OSCILLATION};
use crate::operating::Frozen;

/// A part with at least this share of the largest one is named beside it.
const NAMED: f64 = 0.25;

/// What a mode does.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, serde::Serialize)]
#[serde(rename_all = "snake_case")]
pub enum ModeKind {
    /// It swings; it dies out or grows as its damping ratio says.
    Oscillation,
    /// It dies out without swinging.
    Decay,
    /// It runs away without swinging.
    Growth,
    /// It stays where it is put: trapped pressure.
    Neutral,
}

/// One mode of an equilibrium.
#[derive(Debug, Clone, PartialEq)]
pub struct Mode {
    /// What it does.
    pub kind: ModeKind,
    /// Its eigenvalue, 1/s: real part (growth) and imaginary part (angular frequency, not
    /// negative).
    pub eigenvalue: (f64, f64),
    /// Who takes part, the largest share first (participation factors, added up by part).
    pub shares: Vec<Share>,
    /// Motion of each state of the circuit in the mode, SI, relative to its size in others: real
    /// and imaginary part; 0 for states that are held.
    pub shape: Vec<(f64, f64)>,
}

impl Mode {
    /// Frequency of the undamped mode, Hz; `None` unless it swings.
    #[must_use]
    pub fn frequency(&self) -> Option<f64> {
        (self.kind == ModeKind::Oscillation).then(|| self.size() / TAU)
    }

    /// Frequency at which it is seen to swing, Hz; `None` unless it swings.
    #[must_use]
    pub fn damped_frequency(&self) -> Option<f64> {
        (self.kind == ModeKind::Oscillation).then(|| self.eigenvalue.1 / TAU)
    }

    /// Damping ratio, negative when it grows; `None` unless it swings.
    #[must_use]
    pub fn damping(&self) -> Option<f64> {
        (self.kind == ModeKind::Oscillation).then(|| -self.eigenvalue.0 / self.size())
    }

    /// Time in which it dies out to 37 %, s; negative when it grows, infinite when neutral.
    #[must_use]
    pub fn time_constant(&self) -> f64 {
        match self.kind {
            ModeKind::Neutral => f64::INFINITY,
            _ => -1.0 / self.eigenvalue.0,
        }
    }

    /// Whether it grows.
    #[must_use]
    pub fn grows(&self) -> bool {
        self.kind != ModeKind::Neutral && self.eigenvalue.0 > 0.0
    }

    /// Who swings, in words: the part that takes part most, with what else takes part nearly as
    /// much: "spool with inlet volume".
    #[must_use]
    pub fn name(&self) -> String {
        let Some(first) = self.shares.first() else {
            return String::new();
        };
        let beside = self
            .shares
            .iter()
            .skip(1)
            .take(2)
            .filter(|share| share.share >= NAMED * first.share);
        let beside: Vec<_> = beside.map(|share| share.part.label()).collect();
        if beside.is_empty() {
            first.part.label().to_owned()
        } else {
            format!("{} with {}", first.part.label(), beside.join(" and "))
        }
    }

    fn size(&self) -> f64 {
        self.eigenvalue.0.hypot(self.eigenvalue.1)
    }
}

/// What an eigenvalue (1/s) does.
pub(super) fn kind(eigenvalue: Complex<f64>) -> ModeKind {
    if eigenvalue.im.abs() > SLOWEST_OSCILLATION {
        ModeKind::Oscillation
    } else if eigenvalue.norm() < NEUTRAL {
        ModeKind::Neutral
    } else if eigenvalue.re > 0.0 {
        ModeKind::Growth
    } else {
        ModeKind::Decay
    }
}

/// Damping ratio of an eigenvalue, 1/s.
pub(super) fn damping_of(eigenvalue: Complex<f64>) -> f64 {
    -eigenvalue.re / eigenvalue.norm()
}

/// All modes of an equilibrium.
#[derive(Debug, Clone, PartialEq)]
pub struct Modes {
    /// The modes: those that grow first, then oscillations from the least damped on, then the
    /// others from the slowest on.
    pub all: Vec<Mode>,
}

impl Modes {
    pub(crate) fn of(frozen: &Frozen, state: &[f64]) -> Result<Self, ModesError> {
        let linear = Linear::at(frozen, state)?;
        let names: Vec<&str> = frozen
            .circuit()
            .states()
            .iter()
            .map(|info| info.name.as_str())
            .collect();
        let mut all: Vec<Mode> = linear
            .eigenvalues()?
            .into_iter()
            .filter(|value| value.im >= 0.0)
            .map(|value| mode(&linear, value, &names))
            .collect();
        all.sort_by(|a, b| rank(a).cmp(&rank(b)).then(order(a).total_cmp(&order(b))));
        Ok(Self { all })
    }

    /// The modes that swing, the least damped first.
    pub fn oscillations(&self) -> impl Iterator<Item = &Mode> {
        self.all
            .iter()
            .filter(|mode| mode.kind == ModeKind::Oscillation)
    }

    /// The least damped mode that swings.
    #[must_use]
    pub fn least_damped(&self) -> Option<&Mode> {
        self.oscillations().next()
    }
}

/// Growing without swinging first, then what swings, then what dies out, then what is neutral.
fn rank(mode: &Mode) -> u8 {
    match mode.kind {
        ModeKind::Growth => 0,
        ModeKind::Oscillation => 1,
        ModeKind::Decay => 2,
        ModeKind::Neutral => 3,
    }
}

fn order(mode: &Mode) -> f64 {
    match mode.damping() {
        Some(damping) => damping,
        // The slowest of those that die out; the fastest of those that run away.
        None => -mode.eigenvalue.0,
    }
}

fn mode(linear: &Linear, value: Complex<f64>, names: &[&str]) -> Mode {
    let vectors = linear.vectors(value);
    let mut shape = vec![(0.0, 0.0); names.len()];
    for (at, &state) in linear.free.iter().enumerate() {
        let motion = vectors.right[at] * linear.units[at];
        shape[state] = (motion.re, motion.im);
    }
    Mode {
        kind: kind(vectors.eigenvalue),
        eigenvalue: (vectors.eigenvalue.re, vectors.eigenvalue.im),
        shares: shares(linear, &vectors, names),
        shape,
    }
}

/// Participation factors: the product of a state's components in the left and the right
/// eigenvector, in size, added up by part. They do not depend on the units of the states.
///
/// # Source
/// Pérez-Arriaga, Verghese & Schweppe, *Selective Modal Analysis with Applications to Electric
/// Power Systems*, IEEE Trans. Power Apparatus and Systems PAS-101 (1982) 3117.
fn shares(linear: &Linear, vectors: &Vectors, names: &[&str]) -> Vec<Share> {
    let product = |at: usize| (vectors.left[at] * vectors.right[at]).norm();
    let whole: f64 = (0..linear.free.len()).map(product).sum();
    let mut shares: Vec<Share> = Vec::new();
    for (at, &state) in linear.free.iter().enumerate() {
        let part = Part::of_state(names[state]);
        let share = product(at) / whole;
        match shares.iter_mut().find(|s| s.part == part) {
            Some(known) => known.share += share,
            None => shares.push(Share { part, share }),
        }
    }
    shares.sort_by(|a, b| b.share.total_cmp(&a.share));
    shares
}
