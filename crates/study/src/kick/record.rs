//! Swings of the spool, cycle by cycle.

use helmsplit_model::Circuit;
use helmsplit_sim::{Flow, GiveUp, Recorder, Step};

use super::verdict::{died, outcome};
use super::{Kick, KickOptions};
use crate::equilibrium::Equilibrium;
use crate::modes::Mode;

/// Points in each cycle at which the solver's interpolant is read: extremes are known to a
/// thousandth of the swing.
const POINTS: usize = 64;

/// Cycles at the start that are not counted: other modes that the kick woke die out there.
const FIRST: usize = 2;

/// Cycles in a row whose swings must agree for a limit cycle.
pub(super) const STEADY_CYCLES: usize = 8;

/// By how much they may differ.
pub(super) const STEADY: f64 = 5e-3;

/// Reads the spool and the inlet pressure on an even grid of each cycle.
pub(super) struct Swings {
    x: Option<usize>,
    p_in: Option<usize>,
    rest: f64,
    period: f64,
    until_plain: bool,
    /// Whether nothing stands in the way of a mode that grows.
    grows: bool,
    /// Number of the next point of the grid.
    next: usize,
    buffer: Vec<f64>,
    pub(super) times: Vec<f64>,
    pub(super) deviations: Vec<f64>,
    pressures: Vec<f64>,
    pub(super) travel: Vec<f64>,
    pub(super) inlet_pressure: Vec<f64>,
}

impl Swings {
    pub(super) fn new(
        circuit: &Circuit,
        equilibrium: &Equilibrium,
        mode: &Mode,
        period: f64,
        options: &KickOptions,
    ) -> Self {
        Self {
            grows: mode.grows() && !options.friction,
            x: circuit.state_index("x"),
            p_in: circuit.state_index("p_in"),
            rest: equilibrium.travel(),
            period,
            until_plain: options.until_plain,
            next: 0,
            buffer: vec![0.0; circuit.state_count()],
            times: Vec::new(),
            deviations: Vec::new(),
            pressures: Vec::new(),
            travel: Vec::new(),
            inlet_pressure: Vec::new(),
        }
    }

    fn take(&mut self, time: f64) {
        self.times.push(time);
        let at = |index: Option<usize>, y: &[f64]| index.map_or(0.0, |i| y[i]);
        self.deviations.push(at(self.x, &self.buffer) - self.rest);
        self.pressures.push(at(self.p_in, &self.buffer));
        let count = self.times.len();
        if count > 1 && (count - 1).is_multiple_of(POINTS) {
            let last = count - 1 - POINTS..count;
            let span = |values: &[f64]| {
                let high = values.iter().copied().fold(f64::NEG_INFINITY, f64::max);
                high - values.iter().copied().fold(f64::INFINITY, f64::min)
            };
            self.travel.push(0.5 * span(&self.deviations[last.clone()]));
            self.inlet_pressure.push(span(&self.pressures[last]));
        }
    }

    /// Whether it is plain what becomes of the swings.
    fn is_plain(&self) -> bool {
        let Some((&first, &last)) = self.travel.first().zip(self.travel.last()) else {
            return false;
        };
        let count = self.travel.len();
        count > FIRST + STEADY_CYCLES
            && (last < 0.5 * died(self.grows) * first || is_steady(&self.travel))
    }

    /// The frequency from upward passages through the middle, Hz.
    fn frequency(&self) -> Option<f64> {
        let skip = (FIRST * POINTS).min(self.deviations.len());
        let (times, values) = (&self.times[skip..], &self.deviations[skip..]);
        if values.is_empty() {
            return None;
        }
        // Swings of a limit cycle do not stand evenly about the equilibrium.
        let middle = values.iter().sum::<f64>() / values.len() as f64;
        let noise = 1e-3
            * values
                .iter()
                .map(|v| (v - middle).abs())
                .fold(0.0, f64::max);
        let mut passages = Vec::new();
        let mut below = false;
        for i in 1..values.len() {
            let (a, b) = (values[i - 1] - middle, values[i] - middle);
            below |= a < -noise;
            if below && a < 0.0 && b >= 0.0 {
                passages.push(times[i - 1] + (times[i] - times[i - 1]) * a / (a - b));
                below = false;
            }
        }
        let cycles = passages.len().checked_sub(1).filter(|&n| n >= 2)?;
        Some(cycles as f64 / (passages[cycles] - passages[0]))
    }

    /// Slope of the logarithm of the swings over time, least squares, 1/s.
    fn growth(&self) -> Option<f64> {
        let swings = self.travel.get(FIRST..)?;
        let points: Vec<(f64, f64)> = swings
            .iter()
            .enumerate()
            .filter(|(_, size)| **size > 0.0)
            .map(|(i, size)| (i as f64 * self.period, size.ln()))
            .collect();
        if points.len() < 3 {
            return None;
        }
        let count = points.len() as f64;
        let mean = |pick: fn(&(f64, f64)) -> f64| points.iter().map(pick).sum::<f64>() / count;
        let (t, s) = (mean(|p| p.0), mean(|p| p.1));
        let above: f64 = points.iter().map(|p| (p.0 - t) * (p.1 - s)).sum();
        let below: f64 = points.iter().map(|p| (p.0 - t).powi(2)).sum();
        Some(above / below)
    }

    pub(super) fn told(self, mode: &Mode, options: &KickOptions, gave_up: bool) -> Kick {
        let outcome = outcome(&self, self.grows, gave_up);
        Kick {
            friction: options.friction,
            predicted_frequency: 1.0 / self.period,
            predicted_growth: mode.eigenvalue.0,
            frequency: self.frequency(),
            growth: self.growth(),
            outcome,
            travel: self.travel,
            inlet_pressure: self.inlet_pressure,
            times: self.times,
            deviations: self.deviations,
        }
    }

    /// The frequency of the last cycles, Hz.
    pub(super) fn last_frequency(&self) -> Option<f64> {
        let keep = (STEADY_CYCLES + FIRST) * POINTS;
        let from = self.times.len().saturating_sub(keep);
        let tail = Self {
            times: self.times[from..].to_vec(),
            deviations: self.deviations[from..].to_vec(),
            pressures: Vec::new(),
            travel: Vec::new(),
            inlet_pressure: Vec::new(),
            buffer: Vec::new(),
            ..*self
        };
        tail.frequency()
    }
}

/// Whether the last swings agree with each other.
pub(super) fn is_steady(swings: &[f64]) -> bool {
    let Some(from) = swings.len().checked_sub(STEADY_CYCLES) else {
        return false;
    };
    let last = &swings[from..];
    let high = last.iter().copied().fold(0.0, f64::max);
    let low = last.iter().copied().fold(f64::INFINITY, f64::min);
    high > 0.0 && high - low < STEADY * high
}

impl Recorder for Swings {
    fn begin(&mut self, _piece: usize, time: f64, y: &[f64]) {
        self.buffer.copy_from_slice(y);
        self.take(time);
        self.next = 1;
    }

    fn step(&mut self, step: &mut Step<'_>) -> Result<Flow, GiveUp> {
        loop {
            let time = self.next as f64 * self.period / POINTS as f64;
            if time > step.time {
                return Ok(Flow::Continue);
            }
            let mut buffer = std::mem::take(&mut self.buffer);
            let read = step.at(time.max(step.from), &mut buffer);
            self.buffer = buffer;
            read?;
            self.take(time);
            self.next += 1;
            if self.until_plain && self.next.is_multiple_of(POINTS) && self.is_plain() {
                return Ok(Flow::Stop);
            }
        }
    }
}
