//! Volume and energy audits of a run (docs/model.md, M12).
//!
//! What went in less what went out is integrated along the run; what is stored is a function of
//! the state at both ends. The two are computed apart from each other, so their difference shows
//! any error of equations, solver and bookkeeping.

use helmsplit_model::{Accounts, Readings, Signal};
use serde::Serialize;

use crate::quadrature::Quadrature;

/// Quantities integrated along a run.
const QUANTITIES: usize = 7;

/// One balance over a run: in m3 for volume, J for energy.
#[derive(Debug, Clone, Copy, PartialEq, Serialize)]
pub struct Balance {
    /// What went in.
    pub taken_in: f64,
    /// What went out; for energy, what was lost and the work done.
    pub given_out: f64,
    /// What is stored at the end more than at the start.
    pub stored_change: f64,
    /// What moving walls carried across the account.
    pub walls: f64,
    /// What is missing: `taken_in - given_out - (stored_change - walls)`.
    pub residual: f64,
    /// The residual's share of the turnover, the largest of the four amounts above it.
    pub relative: f64,
}

impl Balance {
    fn new(taken_in: f64, given_out: f64, stored_change: f64, walls: f64) -> Self {
        let residual = taken_in - given_out - (stored_change - walls);
        let turnover = [taken_in, given_out, stored_change, walls]
            .into_iter()
            .fold(0.0, |largest: f64, part| largest.max(part.abs()));
        Self {
            taken_in,
            given_out,
            stored_change,
            walls,
            residual,
            relative: if turnover > 0.0 {
                residual.abs() / turnover
            } else {
                0.0
            },
        }
    }
}

/// Both balances of a run.
#[derive(Debug, Clone, Copy, PartialEq, Serialize)]
pub struct Audit {
    /// Volume, m3, counted at local pressure.
    pub volume: Balance,
    /// Energy, J.
    pub energy: Balance,
}

/// Integrates the balances along a run.
pub(crate) struct AuditMeter {
    accounts: Accounts,
    quadrature: Quadrature<QUANTITIES>,
    stored_at_start: Option<(f64, f64)>,
}

impl AuditMeter {
    pub(crate) fn new(accounts: Accounts) -> Self {
        Self {
            accounts,
            quadrature: Quadrature::new(),
            stored_at_start: None,
        }
    }

    /// A piece begins; its first sample follows.
    pub(crate) fn interrupt(&mut self) {
        self.quadrature.interrupt();
    }

    /// Takes the signals at `time` (s) in state `y`.
    pub(crate) fn push(&mut self, time: f64, y: &[f64], readings: &Readings) {
        if self.stored_at_start.is_none() {
            self.stored_at_start = Some(self.stored(y));
        }
        let (volume_walls, energy_walls) = self.accounts.moving_walls(y);
        let sample = [
            readings.get(Signal::VolumeIn),
            readings.get(Signal::VolumeOut),
            readings.get(Signal::EnergyIn),
            readings.get(Signal::EnergyLost),
            readings.get(Signal::WorkOut),
            volume_walls,
            energy_walls,
        ];
        self.quadrature.push(time, sample);
    }

    /// The balances up to the state `y`, the last one taken.
    pub(crate) fn finish(mut self, y: &[f64]) -> Audit {
        self.quadrature.interrupt();
        let at_end = self.stored(y);
        let at_start = self.stored_at_start.unwrap_or(at_end);
        let [
            volume_in,
            volume_out,
            energy_in,
            lost,
            work,
            volume_walls,
            energy_walls,
        ] = self.quadrature.sums();
        Audit {
            volume: Balance::new(volume_in, volume_out, at_end.0 - at_start.0, volume_walls),
            energy: Balance::new(energy_in, lost + work, at_end.1 - at_start.1, energy_walls),
        }
    }

    fn stored(&self, y: &[f64]) -> (f64, f64) {
        (
            self.accounts.stored_volume(y),
            self.accounts.stored_energy(y),
        )
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_balance_that_closes_has_no_residual() {
        let balance = Balance::new(5.0, 3.0, 2.5, 0.5);
        assert!(balance.residual.abs() < 1e-15, "{balance:?}");
        let open = Balance::new(5.0, 3.0, 1.0, 0.0);
        assert!((open.relative - 0.2).abs() < 1e-15, "{open:?}");
        let empty = Balance::new(0.0, 0.0, 0.0, 0.0);
        assert!(empty.relative.abs() < 1e-15, "nothing moved: {empty:?}");
    }
}
