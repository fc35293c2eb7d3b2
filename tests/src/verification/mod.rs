//! The list of outside checks, one module a group.

mod chamber;
mod circuit_runs;
mod clearance;
mod cylinder;
mod earlier_study;
mod friction;
mod jet_force;
mod land;
mod linear;
mod oil;
mod orifice;
mod pipe;
mod pump;
mod reference_traces;
mod sizing;
mod spool;
mod steering;
mod stiffness;
mod surge;
mod units;

use crate::check::Check;
use crate::document::Chapter;
use crate::outcome::Outcome;

/// A group of checks.
pub struct Group {
    /// Heading in the document.
    pub title: &'static str,
    /// What the reader should know about the group.
    pub about: &'static str,
    /// Makes its checks.
    pub checks: fn() -> Vec<Check>,
}

/// Every group, in the order of the document. A new group is one more row.
pub const GROUPS: &[Group] = &[
    Group {
        title: "Oil",
        about: oil::ABOUT,
        checks: oil::checks,
    },
    Group {
        title: "Stiffness of aerated oil",
        about: stiffness::ABOUT,
        checks: stiffness::checks,
    },
    Group {
        title: "Orifices",
        about: orifice::ABOUT,
        checks: orifice::checks,
    },
    Group {
        title: "Clearances",
        about: clearance::ABOUT,
        checks: clearance::checks,
    },
    Group {
        title: "Lines: friction",
        about: pipe::ABOUT,
        checks: pipe::checks,
    },
    Group {
        title: "Equilibria, modes and responses",
        about: linear::ABOUT,
        checks: linear::checks,
    },
    Group {
        title: "Lines: surge",
        about: surge::ABOUT,
        checks: surge::checks,
    },
    Group {
        title: "Chambers",
        about: chamber::ABOUT,
        checks: chamber::checks,
    },
    Group {
        title: "Excess land",
        about: land::ABOUT,
        checks: land::checks,
    },
    Group {
        title: "Jet forces",
        about: jet_force::ABOUT,
        checks: jet_force::checks,
    },
    Group {
        title: "Spool",
        about: spool::ABOUT,
        checks: spool::checks,
    },
    Group {
        title: "Friction and stops",
        about: friction::ABOUT,
        checks: friction::checks,
    },
    Group {
        title: "Pump",
        about: pump::ABOUT,
        checks: pump::checks,
    },
    Group {
        title: "Steering",
        about: steering::ABOUT,
        checks: steering::checks,
    },
    Group {
        title: "Oil column of the cylinder",
        about: cylinder::ABOUT,
        checks: cylinder::checks,
    },
    Group {
        title: "Whole circuits: closed forms",
        about: circuit_runs::ABOUT,
        checks: circuit_runs::checks,
    },
    Group {
        title: "Whole circuits: reference traces",
        about: reference_traces::ABOUT,
        checks: reference_traces::checks,
    },
    Group {
        title: "Whole circuits: an earlier study",
        about: earlier_study::ABOUT,
        checks: earlier_study::checks,
    },
    Group {
        title: "Sizing",
        about: sizing::ABOUT,
        checks: sizing::checks,
    },
    Group {
        title: "Units",
        about: units::ABOUT,
        checks: units::checks,
    },
];

/// Every group with what the engine gives: asks the engine for each check once.
#[must_use]
pub fn chapters() -> Vec<Chapter> {
    GROUPS
        .iter()
        .map(|group| Chapter {
            title: group.title,
            about: group.about,
            outcomes: (group.checks)().into_iter().map(Outcome::of).collect(),
        })
        .collect()
}
