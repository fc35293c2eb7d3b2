//! Figures: single numbers that a scenario gives, addressed by id.
//!
//! A figure is one of the checks, of a run or of the operating map; a statistic of a state or
//! signal over the run; or a reading of the equilibrium at one operating point. Studies that vary
//! parameters (solve-for, influence, mending) ask for figures by [`Figure`] and get numbers.

mod ask;
mod parse;

use std::fmt;

use helmsplit_model::{Circuit, Quantity};

use crate::check::CheckId;

pub use ask::{Ask, Missing};
pub use parse::FigureError;

/// What is taken of a trace.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum Statistic {
    /// Least value over the run.
    Least,
    /// Largest value over the run.
    Largest,
    /// Mean over time.
    Mean,
    /// Value at the end of the run.
    End,
}

impl Statistic {
    /// Every statistic.
    pub const ALL: [Self; 4] = [Self::Least, Self::Largest, Self::Mean, Self::End];

    /// Its name in the id of a figure.
    #[must_use]
    pub fn name(self) -> &'static str {
        match self {
            Self::Least => "least",
            Self::Largest => "largest",
            Self::Mean => "mean",
            Self::End => "end",
        }
    }

    /// What it is.
    #[must_use]
    pub fn label(self) -> &'static str {
        match self {
            Self::Least => "least value over the run",
            Self::Largest => "largest value over the run",
            Self::Mean => "mean over the time of the run",
            Self::End => "value at the end of the run",
        }
    }
}

/// A number that a scenario gives.
#[derive(Debug, Clone, PartialEq, Eq, Hash)]
pub enum Figure {
    /// The figure of a check.
    Check(CheckId),
    /// A statistic of a state or signal of the run.
    Trace {
        /// Short name of the state or signal.
        column: String,
        /// What is taken of it.
        statistic: Statistic,
    },
    /// A state or signal at the equilibrium.
    Rest {
        /// Short name of the state or signal.
        column: String,
    },
    /// The least damping ratio of the equilibrium.
    RestDamping,
}

/// What the id of a figure at rest begins with.
pub(crate) const REST: &str = "rest.";

/// What the damping ratio is called behind it.
pub(crate) const REST_DAMPING: &str = "damping";

/// The id, as [`Figure::parse`] reads it: `overshoot`, `p_in.largest`.
impl fmt::Display for Figure {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::Check(id) => f.write_str(id.name()),
            Self::Trace { column, statistic } => write!(f, "{column}.{}", statistic.name()),
            Self::Rest { column } => write!(f, "{REST}{column}"),
            Self::RestDamping => write!(f, "{REST}{REST_DAMPING}"),
        }
    }
}

/// Checks that one run answers, in order.
pub const RUN_CHECKS: [CheckId; 10] = [
    CheckId::Overshoot,
    CheckId::Settling,
    CheckId::Dropout,
    CheckId::SteeringLimit,
    CheckId::ConsumerAtLock,
    CheckId::PilotClearance,
    CheckId::PeakPressure,
    CheckId::LineVelocity,
    CheckId::ViscosityWindow,
    CheckId::Heat,
];

/// Checks that the operating map answers, in order.
pub const MAP_CHECKS: [CheckId; 5] = [
    CheckId::PriorityAtIdle,
    CheckId::Regulation,
    CheckId::Damping,
    CheckId::StrokeReserve,
    CheckId::RippleClearance,
];

/// Kind of the figure of a check.
#[must_use]
pub fn check_quantity(id: CheckId) -> Quantity {
    match id {
        CheckId::Settling | CheckId::Dropout => Quantity::Time,
        CheckId::SteeringLimit | CheckId::PilotClearance => Quantity::Pressure,
        CheckId::LineVelocity => Quantity::Velocity,
        CheckId::ViscosityWindow => Quantity::KinematicViscosity,
        CheckId::PriorityAtIdle
        | CheckId::Regulation
        | CheckId::Overshoot
        | CheckId::Damping
        | CheckId::ConsumerAtLock
        | CheckId::PeakPressure
        | CheckId::StrokeReserve
        | CheckId::RippleClearance
        | CheckId::Heat
        | CheckId::Audit => Quantity::Ratio,
    }
}

/// Name, label and kind of every state and signal of a circuit's trace.
pub fn trace_columns(circuit: &Circuit) -> impl Iterator<Item = (&str, &str, Quantity)> {
    let states = circuit
        .states()
        .iter()
        .map(|state| (state.name.as_str(), state.label.as_str(), state.quantity));
    let signals = circuit
        .signals()
        .iter()
        .map(|signal| (signal.name(), signal.label(), signal.quantity()));
    states.chain(signals)
}

impl Figure {
    /// Its kind; [`Quantity::Count`] for a trace that the circuit does not have.
    #[must_use]
    pub fn quantity(&self, circuit: &Circuit) -> Quantity {
        match self {
            Self::Check(id) => check_quantity(*id),
            Self::RestDamping => Quantity::Ratio,
            Self::Trace { column, .. } | Self::Rest { column } => trace_columns(circuit)
                .find(|(name, _, _)| name == column)
                .map_or(Quantity::Count, |(_, _, quantity)| quantity),
        }
    }

    /// What a person calls it.
    #[must_use]
    pub fn label(&self, circuit: &Circuit) -> String {
        match self {
            Self::Check(id) => id.label().to_owned(),
            Self::Trace { column, statistic } => {
                format!("{}, {}", column_label(circuit, column), statistic.label())
            }
            Self::Rest { column } => format!("{}, at rest", column_label(circuit, column)),
            Self::RestDamping => "Least damping ratio, at rest".to_owned(),
        }
    }
}

fn column_label<'a>(circuit: &'a Circuit, column: &'a str) -> &'a str {
    trace_columns(circuit)
        .find(|(name, _, _)| *name == column)
        .map_or(column, |(_, label, _)| label)
}
