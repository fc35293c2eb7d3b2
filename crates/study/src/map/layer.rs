//! What a map can show.

use helmsplit_model::Quantity;

use super::cell::Cell;

/// One layer of a map.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, serde::Serialize)]
#[serde(rename_all = "kebab-case")]
pub enum Layer {
    /// Flow from the priority port.
    PriorityFlow,
    /// Flow from the priority port against the set flow.
    PriorityError,
    /// Flow from the excess port.
    ExcessFlow,
    /// Least damping ratio of the modes below 500 Hz; negative where it hunts.
    Damping,
    /// Frequency of that mode.
    Frequency,
    /// Travel of the spool.
    Travel,
    /// Distance of the spool from its stop over the stroke.
    StrokeReserve,
    /// Power turned to heat.
    Heat,
    /// Inlet pressure.
    InletPressure,
}

impl Layer {
    /// Every layer, in order.
    pub const ALL: [Self; 9] = [
        Self::PriorityFlow,
        Self::PriorityError,
        Self::ExcessFlow,
        Self::Damping,
        Self::Frequency,
        Self::Travel,
        Self::StrokeReserve,
        Self::Heat,
        Self::InletPressure,
    ];

    /// Its name on the command line.
    #[must_use]
    pub fn name(self) -> &'static str {
        match self {
            Self::PriorityFlow => "priority-flow",
            Self::PriorityError => "priority-error",
            Self::ExcessFlow => "excess-flow",
            Self::Damping => "damping",
            Self::Frequency => "frequency",
            Self::Travel => "travel",
            Self::StrokeReserve => "stroke-reserve",
            Self::Heat => "heat",
            Self::InletPressure => "inlet-pressure",
        }
    }

    /// The layer of that name.
    #[must_use]
    pub fn from_name(name: &str) -> Option<Self> {
        Self::ALL.into_iter().find(|layer| layer.name() == name)
    }

    /// What a person calls it.
    #[must_use]
    pub fn label(self) -> &'static str {
        match self {
            Self::PriorityFlow => "Priority flow",
            Self::PriorityError => "Priority flow against the set flow",
            Self::ExcessFlow => "Excess flow",
            Self::Damping => "Least damping ratio",
            Self::Frequency => "Frequency of the least damped mode",
            Self::Travel => "Spool travel",
            Self::StrokeReserve => "Stroke in reserve",
            Self::Heat => "Power turned to heat",
            Self::InletPressure => "Inlet pressure",
        }
    }

    /// Kind of quantity; `None` for a frequency in Hz, which the units do not know.
    #[must_use]
    pub fn quantity(self) -> Option<Quantity> {
        match self {
            Self::PriorityFlow | Self::ExcessFlow => Some(Quantity::Flow),
            Self::PriorityError | Self::Damping | Self::StrokeReserve => Some(Quantity::Ratio),
            Self::Frequency => None,
            Self::Travel => Some(Quantity::Length),
            Self::Heat => Some(Quantity::Power),
            Self::InletPressure => Some(Quantity::Pressure),
        }
    }

    /// Its value at a place, SI (a frequency in Hz); not a number where there is none.
    #[must_use]
    pub fn value(self, cell: &Cell) -> f64 {
        match self {
            Self::PriorityFlow => cell.priority_flow,
            Self::PriorityError => cell.priority_error,
            Self::ExcessFlow => cell.excess_flow,
            Self::Damping => cell.slow_damping.map_or(f64::NAN, |(damping, _)| damping),
            Self::Frequency => cell.slow_damping.map_or(f64::NAN, |(_, f)| f),
            Self::Travel => cell.travel,
            Self::StrokeReserve => cell.stroke_reserve,
            Self::Heat => cell.heat,
            Self::InletPressure => cell.inlet_pressure,
        }
    }
}
