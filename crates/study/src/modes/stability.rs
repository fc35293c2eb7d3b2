//! Whether an equilibrium is stable, from its eigenvalues alone.

use nalgebra::Complex;

use super::eigen::Linear;
use super::error::ModesError;
use super::mode::{ModeKind, damping_of, kind};
use crate::operating::Frozen;

/// How an equilibrium stands against a small disturbance, friction left out.
#[derive(Debug, Clone, PartialEq)]
pub struct Stability {
    /// Least damping ratio of all modes that swing; `None` if none does.
    pub damping: Option<f64>,
    /// Frequency of that mode, Hz, undamped.
    pub frequency: Option<f64>,
    /// Largest real part of all eigenvalues that are not neutral, 1/s.
    pub growth: f64,
    /// Number of modes that grow while they swing.
    pub hunting: usize,
    /// Number of modes that run away without swinging.
    pub running_away: usize,
    /// Every eigenvalue, 1/s: real and imaginary part.
    pub eigenvalues: Vec<(f64, f64)>,
}

impl Stability {
    pub(crate) fn at(frozen: &Frozen, state: &[f64]) -> Result<Self, ModesError> {
        let values = Linear::at(frozen, state)?.eigenvalues()?;
        Ok(Self::of(&values))
    }

    pub(super) fn of(values: &[Complex<f64>]) -> Self {
        let swinging = values
            .iter()
            .filter(|v| v.im > 0.0 && kind(**v) == ModeKind::Oscillation);
        let least = swinging
            .clone()
            .min_by(|a, b| damping_of(**a).total_cmp(&damping_of(**b)));
        Self {
            damping: least.map(|v| damping_of(*v)),
            frequency: least.map(|v| v.norm() / std::f64::consts::TAU),
            growth: values
                .iter()
                .filter(|v| kind(**v) != ModeKind::Neutral)
                .map(|v| v.re)
                .fold(f64::NEG_INFINITY, f64::max),
            hunting: swinging.filter(|v| v.re > 0.0).count(),
            running_away: values
                .iter()
                .filter(|v| kind(**v) == ModeKind::Growth)
                .count(),
            eigenvalues: values.iter().map(|v| (v.re, v.im)).collect(),
        }
    }

    /// Least damping ratio of the modes that swing below a frequency, Hz; `None` if none does.
    #[must_use]
    pub fn damping_below(&self, frequency: f64) -> Option<(f64, f64)> {
        self.eigenvalues
            .iter()
            .map(|&(re, im)| Complex::new(re, im))
            .filter(|v| v.im > 0.0 && kind(*v) == ModeKind::Oscillation)
            .map(|v| (damping_of(v), v.norm() / std::f64::consts::TAU))
            .filter(|&(_, own)| own < frequency)
            .min_by(|a, b| a.0.total_cmp(&b.0))
    }

    /// Whether every disturbance dies out, or stays where it is put.
    #[must_use]
    pub fn is_stable(&self) -> bool {
        self.hunting == 0 && self.running_away == 0
    }

    /// The verdict in words.
    #[must_use]
    pub fn word(&self) -> &'static str {
        match (self.hunting, self.running_away) {
            (0, 0) => "stable",
            (0, _) => "runs away",
            (_, 0) => "hunts",
            _ => "hunts and runs away",
        }
    }
}
