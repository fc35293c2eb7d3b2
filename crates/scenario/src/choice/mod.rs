//! Choices: what sits in each slot of the circuit, and how a part is described.

mod table;

pub use table::*;

/// One choice of the circuit file, such as `priority_relief.kind`.
#[derive(Debug)]
pub struct Choice {
    /// Its identity.
    pub id: ChoiceId,
    /// Path in the circuit file: section and name.
    pub path: &'static str,
    /// What a person calls it.
    pub label: &'static str,
    /// Meaning and effect in one sentence.
    pub note: &'static str,
    /// What may be chosen.
    pub options: &'static [ChoiceOption],
    /// Position of the default among the options.
    pub default: u8,
    /// Other choices under which this one matters; all must hold.
    pub when: &'static [Condition],
}

/// One option of a choice.
#[derive(Debug)]
pub struct ChoiceOption {
    /// How the circuit file spells it.
    pub key: &'static str,
    /// What a person calls it.
    pub label: &'static str,
    /// Meaning in one sentence.
    pub note: &'static str,
}

impl Choice {
    /// The section of the circuit file that it stands in.
    #[must_use]
    pub fn section(&self) -> &'static str {
        section_of(self.path)
    }

    /// Its name inside the section.
    #[must_use]
    pub fn name(&self) -> &'static str {
        name_of(self.path)
    }
}

impl ChoiceId {
    /// The row of the table.
    #[must_use]
    pub fn choice(self) -> &'static Choice {
        &CHOICES[self as usize]
    }

    /// The choice with that path.
    #[must_use]
    pub fn from_path(path: &str) -> Option<Self> {
        CHOICES
            .iter()
            .find(|choice| choice.path == path)
            .map(|choice| choice.id)
    }
}

/// The options of one choice as a type of their own, so that a `match` handles each.
pub trait Options: Copy + 'static {
    /// The choice that these options belong to.
    const ID: ChoiceId;
    /// Every option, in the order of the table.
    const ALL: &'static [Self];
}

/// Holds when the choice stands at one of the options.
#[derive(Debug, Clone, Copy)]
pub struct Condition {
    /// The choice.
    pub choice: ChoiceId,
    /// Positions of the options.
    pub any_of: &'static [u8],
}

/// A condition, for use in the tables.
pub(crate) const fn when(choice: ChoiceId, any_of: &'static [u8]) -> Condition {
    Condition { choice, any_of }
}

/// What comes ahead of the dot of a path.
pub(crate) fn section_of(path: &'static str) -> &'static str {
    path.split_once('.').map_or(path, |(section, _)| section)
}

/// What comes behind the dot of a path.
pub(crate) fn name_of(path: &'static str) -> &'static str {
    path.split_once('.').map_or(path, |(_, name)| name)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn table_is_in_order_and_its_defaults_exist() {
        for (index, choice) in CHOICES.iter().enumerate() {
            assert_eq!(
                choice.id as usize, index,
                "{} stands in its place",
                choice.path
            );
            assert!(
                usize::from(choice.default) < choice.options.len(),
                "{}",
                choice.path
            );
            assert_eq!(
                ChoiceId::from_path(choice.path),
                Some(choice.id),
                "{}",
                choice.path
            );
            for (at, option) in choice.options.iter().enumerate() {
                let first = choice.options.iter().position(|o| o.key == option.key);
                assert_eq!(
                    first,
                    Some(at),
                    "{}: {} appears once",
                    choice.path,
                    option.key
                );
            }
        }
    }

    #[test]
    fn conditions_name_options_that_exist() {
        for choice in CHOICES {
            for condition in choice.when {
                let other = condition.choice.choice();
                let known = condition
                    .any_of
                    .iter()
                    .all(|&o| usize::from(o) < other.options.len());
                assert!(known, "{} depends on {}", choice.path, other.path);
            }
        }
    }
}
