//! A field to go to: its card opens, it takes the focus and is marked.

use helmsplit_scenario::ParameterId;
use helmsplit_scenario::choice::ChoiceId;

use crate::parts::Part;

/// A field on a card.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) enum Spot {
    /// The field of a parameter.
    Parameter(ParameterId),
    /// The menu of a choice.
    Choice(ChoiceId),
}

impl Spot {
    /// Its path in the circuit file.
    pub(crate) fn path(self) -> &'static str {
        match self {
            Self::Parameter(id) => id.parameter().path,
            Self::Choice(id) => id.choice().path,
        }
    }

    /// The part whose card it stands on.
    pub(crate) fn part(self) -> Option<Part> {
        Part::of(self.path())
    }
}
