//! The parameter table: one row for each number of a circuit file.
//!
//! Reading, validation, access by path, the written file, docs/circuit-file.md, forms, sweeps and
//! fits all draw on these rows. Adding a parameter is one row here and its use in `assemble`.
//!
//! Defaults are the invented data of the orchard carrier, or invented to go with it. Usual ranges
//! are common practice, no source, unless the row names one; outside them a value earns a warning,
//! outside the allowed range an error.

mod range;

pub mod cylinder;
pub mod excess;
pub mod excess_relief;
pub mod lift;
pub mod limits;
pub mod line;
pub mod main_relief;
pub mod manoeuvre;
pub mod oil;
pub mod prime_mover;
pub mod priority_relief;
pub mod pump;
pub mod ratings;
pub mod return_line;
pub mod solver;
pub mod start;
pub mod steering;
pub mod steering_motor;
pub mod valve;
pub mod valve_edges;

use std::collections::HashMap;
use std::sync::LazyLock;

use helmsplit_model::Quantity;

use crate::choice::{Condition, name_of, section_of};
use crate::quantity_text;
use crate::units::Unit;

pub use range::Range;
pub(crate) use range::{over, usual, within};

/// Identity of a parameter: its place in the table.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub struct ParameterId(u16);

/// One row of the parameter table.
#[derive(Debug)]
pub struct Parameter {
    /// Its identity.
    pub id: ParameterId,
    /// Path in the circuit file: section and name.
    pub path: &'static str,
    /// What a person calls it.
    pub label: &'static str,
    /// Symbol as in docs/model.md; empty where it has none.
    pub symbol: &'static str,
    /// Kind of quantity.
    pub quantity: Quantity,
    /// Default as the circuit file writes it; its unit is the row's preferred metric unit.
    pub default: &'static str,
    /// What is allowed, in the unit of the default.
    pub allowed: Range,
    /// What is usual, in the unit of the default.
    pub usual: Range,
    /// Choices under which it is used; all must hold.
    pub when: &'static [Condition],
    /// Meaning and effect in one sentence.
    pub note: &'static str,
    /// Equation of docs/model.md, or the source of a rule or number.
    pub source: &'static str,
}

impl Parameter {
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

    /// Its preferred metric unit: that of the default.
    #[must_use]
    pub fn unit(&self) -> &'static Unit {
        DEFAULTS[usize::from(self.id.0)].1
    }

    /// Its default in SI.
    #[must_use]
    pub fn default_si(&self) -> f64 {
        DEFAULTS[usize::from(self.id.0)].0
    }
}

impl ParameterId {
    /// The row of the table.
    #[must_use]
    pub fn parameter(self) -> &'static Parameter {
        TABLE[usize::from(self.0)]
    }

    /// The parameter with that path.
    #[must_use]
    pub fn from_path(path: &str) -> Option<Self> {
        BY_PATH.get(path).copied()
    }

    /// Position in the table.
    #[must_use]
    pub fn index(self) -> usize {
        usize::from(self.0)
    }
}

/// Number of parameters.
pub const COUNT: usize = solver::END as usize;

/// Every parameter, in the order of the circuit file.
#[must_use]
pub fn parameters() -> &'static [&'static Parameter] {
    &TABLE
}

/// Writes one section's rows: a constant for each id, and the table of the section.
macro_rules! rows {
    ($section:literal from $base:expr;
     $( $id:ident $key:literal $label:literal $symbol:literal $quantity:ident $default:literal,
        $allowed:expr, $usual:expr, $when:expr, $note:literal, $source:expr; )*) => {
        #[allow(non_camel_case_types, clippy::upper_case_acronyms, reason = "a counter")]
        enum Place { $( $id ),* }

        $(
            #[doc = concat!("`", $section, ".", $key, "`: ", $label, ". ", $note)]
            pub const $id: $crate::parameter::ParameterId =
                $crate::parameter::ParameterId($base + Place::$id as u16);
        )*

        pub(super) static ROWS: &[$crate::parameter::Parameter] = &[ $(
            $crate::parameter::Parameter {
                id: $id,
                path: concat!($section, ".", $key),
                label: $label,
                symbol: $symbol,
                quantity: helmsplit_model::Quantity::$quantity,
                default: $default,
                allowed: $allowed,
                usual: $usual,
                when: $when,
                note: $note,
                source: $source,
            }
        ),* ];

        /// Place of the first row behind this section.
        pub(super) const END: u16 = $base + [ $( stringify!($id) ),* ].len() as u16;
    };
}
pub(crate) use rows;

/// Used whatever is chosen.
pub(crate) const ALWAYS: &[Condition] = &[];

static TABLE: LazyLock<Vec<&'static Parameter>> = LazyLock::new(|| {
    let sections = [
        prime_mover::ROWS,
        oil::ROWS,
        pump::ROWS,
        valve::ROWS,
        valve_edges::ROWS,
        main_relief::ROWS,
        priority_relief::ROWS,
        line::ROWS,
        steering::ROWS,
        cylinder::ROWS,
        steering_motor::ROWS,
        excess::ROWS,
        lift::ROWS,
        excess_relief::ROWS,
        return_line::ROWS,
        start::ROWS,
        manoeuvre::ROWS,
        limits::ROWS,
        ratings::ROWS,
        solver::ROWS,
    ];
    sections.into_iter().flatten().collect()
});

static BY_PATH: LazyLock<HashMap<&'static str, ParameterId>> =
    LazyLock::new(|| TABLE.iter().map(|row| (row.path, row.id)).collect());

/// Default in SI and its unit, for each row.
static DEFAULTS: LazyLock<Vec<(f64, &'static Unit)>> = LazyLock::new(|| {
    let read = |row: &&'static Parameter| {
        quantity_text::parse(row.default, row.quantity)
            .map(|parsed| (parsed.si, parsed.unit))
            .unwrap_or_else(|error| unreachable!("default of {}: {error}", row.path))
    };
    TABLE.iter().map(read).collect()
});

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn ids_are_places_and_paths_are_unique() {
        assert_eq!(parameters().len(), COUNT, "no section is left out");
        for (place, row) in parameters().iter().enumerate() {
            assert_eq!(row.id.index(), place, "{} stands in its place", row.path);
            assert_eq!(
                ParameterId::from_path(row.path),
                Some(row.id),
                "{} is unique",
                row.path
            );
        }
    }

    #[test]
    fn defaults_are_allowed_and_usual() {
        for row in parameters() {
            let value = row.unit().value_from_si(row.default_si());
            assert!(
                row.allowed.contains(value),
                "{}: {} is not allowed",
                row.path,
                row.default
            );
            assert!(
                row.usual.contains(value),
                "{}: {} is not usual",
                row.path,
                row.default
            );
            assert!(
                row.usual.low >= row.allowed.low,
                "{}: usual below allowed",
                row.path
            );
            assert!(
                row.usual.high <= row.allowed.high,
                "{}: usual above allowed",
                row.path
            );
        }
    }

    #[test]
    fn notes_are_sentences() {
        for row in parameters() {
            assert!(row.note.ends_with('.'), "{}: {}", row.path, row.note);
            assert!(row.note.len() > 15, "{}: {}", row.path, row.note);
            assert!(!row.label.ends_with('.'), "{}", row.path);
            assert!(!row.source.is_empty(), "{}", row.path);
        }
    }

    #[test]
    fn conditions_name_options_that_exist() {
        for row in parameters() {
            for condition in row.when {
                let options = condition.choice.choice().options;
                let known = condition
                    .any_of
                    .iter()
                    .all(|&o| usize::from(o) < options.len());
                assert!(
                    known,
                    "{} depends on {}",
                    row.path,
                    condition.choice.choice().path
                );
            }
        }
    }

    #[test]
    fn sections_stand_together() {
        let mut seen: Vec<&str> = Vec::new();
        for row in parameters() {
            if seen.last() != Some(&row.section()) {
                assert!(
                    !seen.contains(&row.section()),
                    "{} is torn apart",
                    row.section()
                );
                seen.push(row.section());
            }
        }
    }
}
