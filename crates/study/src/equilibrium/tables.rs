//! Pressures, flows and losses of an equilibrium as tables.

use helmsplit_model::{Quantity, Signal};

use super::Equilibrium;
use crate::check::Measure;

/// One pressure or flow of an equilibrium.
#[derive(Debug, Clone, PartialEq)]
pub struct Reading {
    /// Short name, as in traces.
    pub name: String,
    /// What a person calls it.
    pub label: String,
    /// How much.
    pub value: Measure,
}

/// Where power is lost.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Loss {
    /// The signal.
    pub signal: Signal,
    /// Power, W.
    pub power: f64,
    /// Share of all that is turned to heat.
    pub share: f64,
}

/// Where power goes; together they are the heat, but for the work of jets on a moving spool.
const LOSSES: [Signal; 10] = [
    Signal::FixedOrificeLoss,
    Signal::HolesLoss,
    Signal::LandLoss,
    Signal::DampingLoss,
    Signal::ReliefLoss,
    Signal::LineLoss,
    Signal::SteeringLoss,
    Signal::ConsumerLoss,
    Signal::ReturnLoss,
    Signal::FrictionLoss,
];

impl Equilibrium {
    /// Every pressure, Pa, in the order of the circuit's states.
    #[must_use]
    pub fn pressures(&self) -> Vec<Reading> {
        let states = self.circuit().states().iter().zip(&self.state);
        states
            .filter(|(info, _)| info.quantity == Quantity::Pressure)
            .map(|(info, &si)| Reading {
                name: info.name.clone(),
                label: info.label.clone(),
                value: Measure::new(si, Quantity::Pressure),
            })
            .collect()
    }

    /// Every flow, m3/s, in the order of the circuit's signals.
    #[must_use]
    pub fn flows(&self) -> Vec<Reading> {
        let audits = [Signal::VolumeIn, Signal::VolumeOut];
        let signals = self.circuit().signals().iter();
        signals
            .filter(|s| s.quantity() == Quantity::Flow && !audits.contains(s))
            .map(|&signal| Reading {
                name: signal.name().to_owned(),
                label: signal.label().to_owned(),
                value: Measure::new(self.signal(signal), Quantity::Flow),
            })
            .collect()
    }

    /// Where power is lost, W, the largest first, with their share of the heat; the mechanical
    /// loss of the pump is what is missing to the whole.
    #[must_use]
    pub fn losses(&self) -> Vec<Loss> {
        let heat = self.signal(Signal::HeatPower);
        let mut all: Vec<Loss> = LOSSES
            .into_iter()
            .filter(|&signal| self.readings.has(signal))
            .map(|signal| {
                let power = self.signal(signal);
                let share = if heat > 0.0 { power / heat } else { 0.0 };
                Loss {
                    signal,
                    power,
                    share,
                }
            })
            .collect();
        all.sort_by(|a, b| b.power.total_cmp(&a.power));
        all
    }
}
