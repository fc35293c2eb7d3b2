//! The balance of forces on the spool.

use helmsplit_model::Signal;

use super::Equilibrium;
use crate::operating::LeftOut;

/// What pushes the spool.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum ForceKind {
    /// Pressure on both ends.
    Pressure,
    /// The spring.
    Spring,
    /// The jet of the excess land.
    ExcessJet,
    /// The jet of the priority holes.
    PriorityJet,
    /// The end stops.
    Stop,
    /// The sum of them.
    Sum,
    /// Dry friction: left out, and how much it could hold either way.
    Friction,
}

impl ForceKind {
    /// What a person calls it.
    #[must_use]
    pub fn label(self) -> &'static str {
        match self {
            Self::Pressure => "pressure on the ends",
            Self::Spring => "spring",
            Self::ExcessJet => "jet of the excess land",
            Self::PriorityJet => "jet of the priority holes",
            Self::Stop => "end stop",
            Self::Sum => "sum",
            Self::Friction => "dry friction, left out",
        }
    }
}

/// One force on the spool.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Force {
    /// What pushes.
    pub kind: ForceKind,
    /// Force, N, positive towards opening the excess land. For [`ForceKind::Friction`] the most
    /// that it could hold either way.
    pub force: f64,
}

impl Equilibrium {
    /// The balance of forces on the spool, N: pressure, spring, jets, stop, their sum, and the dry
    /// friction that was left out. Viscous and transient forces are 0 at rest.
    #[must_use]
    pub fn forces(&self) -> Vec<Force> {
        let of = |kind: ForceKind, force: f64| Force { kind, force };
        let friction = self.left_out().iter().find_map(|left| match left {
            LeftOut::SpoolFriction(force) => Some(*force),
            _ => None,
        });
        let mut all = vec![
            of(ForceKind::Pressure, self.signal(Signal::EndPressureForce)),
            of(ForceKind::Spring, -self.signal(Signal::SpringForce)),
            of(ForceKind::ExcessJet, -self.signal(Signal::ExcessJetForce)),
            of(
                ForceKind::PriorityJet,
                self.signal(Signal::PriorityJetForce),
            ),
            of(ForceKind::Stop, self.signal(Signal::StopForce)),
        ];
        let sum = all.iter().map(|f| f.force).sum();
        all.push(of(ForceKind::Sum, sum));
        all.extend(friction.map(|force| of(ForceKind::Friction, force)));
        all
    }
}
