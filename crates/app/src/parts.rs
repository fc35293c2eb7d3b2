//! The parts of a circuit: what the list names and the cards show.

use helmsplit_scenario::choice::{CHOICES, Choice};
use helmsplit_scenario::{Parameter, Scenario, parameters};

/// One part: a section of the circuit file.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) struct Part {
    /// The section.
    pub(crate) section: &'static str,
    /// What a person calls it.
    pub(crate) label: &'static str,
}

const fn part(section: &'static str, label: &'static str) -> Part {
    Part { section, label }
}

/// Every part, from the shaft to the tank, then what belongs to the run.
pub(crate) const PARTS: [Part; 16] = [
    part("prime_mover", "Prime mover"),
    part("pump", "Pump"),
    part("main_relief", "Main relief"),
    part("valve", "Priority valve"),
    part("priority_relief", "Priority relief"),
    part("line", "Priority line"),
    part("steering", "Steering side"),
    part("excess", "Excess side"),
    part("excess_relief", "Excess relief"),
    part("return_line", "Return line"),
    part("oil", "Oil"),
    part("manoeuvre", "Manoeuvre"),
    part("start", "Start of the run"),
    part("limits", "Limits"),
    part("ratings", "Ratings"),
    part("solver", "Solver"),
];

impl Part {
    /// The part that a path belongs to.
    pub(crate) fn of(path: &str) -> Option<Self> {
        let section = path.split_once('.').map_or(path, |(section, _)| section);
        PARTS.into_iter().find(|part| part.section == section)
    }

    /// Its parameters that are used under the present choices.
    pub(crate) fn used(self, scenario: &Scenario) -> Vec<&'static Parameter> {
        let rows = parameters().iter().copied();
        rows.filter(|row| row.section() == self.section && scenario.uses(row.id))
            .collect()
    }

    /// Its choices that matter under the present choices.
    pub(crate) fn choices(self, scenario: &Scenario) -> Vec<&'static Choice> {
        let rows = CHOICES.iter();
        rows.filter(|row| row.section() == self.section && scenario.uses_choice(row.id))
            .collect()
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_parameter_and_choice_has_its_part() {
        let paths = parameters().iter().map(|row| row.path);
        for path in paths.chain(CHOICES.iter().map(|choice| choice.path)) {
            assert!(Part::of(path).is_some(), "{path} is on no card");
        }
        for part in PARTS {
            let known = parameters().iter().any(|row| row.section() == part.section);
            assert!(known, "{} has something to show", part.section);
        }
    }
}
