//! Why a quantity text was refused, and what would do instead.

use helmsplit_model::Quantity;
use thiserror::Error;

use crate::units::{Unit, quantity_name, quantity_with_article, sample_text, units_of};

/// A quantity text that cannot be used. [`QuantityError::hint`] says what would do.
#[derive(Debug, Clone, PartialEq, Eq, Error)]
#[error("{}", self.message())]
#[non_exhaustive]
pub enum QuantityError {
    /// Nothing, or only spaces.
    Empty {
        /// The kind of quantity wanted.
        wanted: Quantity,
    },
    /// Longer than any number needs to be.
    TooLong {
        /// The kind of quantity wanted.
        wanted: Quantity,
    },
    /// Does not begin with a number.
    NoNumber {
        /// The kind of quantity wanted.
        wanted: Quantity,
    },
    /// `nan`, `inf` or a word like them.
    NotFinite {
        /// The kind of quantity wanted.
        wanted: Quantity,
    },
    /// A comma inside the number.
    DecimalComma {
        /// The number as it would read with a point.
        with_point: String,
    },
    /// A blank or an underscore inside the number.
    BrokenNumber {
        /// The number without the gap.
        joined: String,
    },
    /// A fraction such as `3/8`.
    Fraction {
        /// The kind of quantity wanted.
        wanted: Quantity,
    },
    /// A number alone where a unit is needed.
    MissingUnit {
        /// The kind of quantity wanted.
        wanted: Quantity,
        /// The number as written.
        number: String,
    },
    /// A known unit of another kind of quantity.
    WrongKind {
        /// The kind of quantity wanted.
        wanted: Quantity,
        /// The kind the unit measures.
        found: Quantity,
        /// The unit as written.
        unit: String,
    },
    /// No unit of any kind.
    UnknownUnit {
        /// The kind of quantity wanted.
        wanted: Quantity,
        /// The unit as written.
        unit: String,
        /// The nearest unit of the wanted kind.
        nearest: Option<&'static str>,
    },
    /// Beyond the largest number.
    TooLarge {
        /// The kind of quantity wanted.
        wanted: Quantity,
    },
    /// Not zero, but too near zero to be held.
    TooSmall {
        /// The kind of quantity wanted.
        wanted: Quantity,
    },
    /// A count with a part behind the point.
    NotWhole,
    /// A temperature below absolute zero.
    BelowAbsoluteZero,
}

impl QuantityError {
    fn message(&self) -> String {
        match self {
            Self::Empty { wanted } => format!("{} is missing", quantity_name(*wanted)),
            Self::TooLong { wanted } => {
                format!(
                    "the text is too long for {}",
                    quantity_with_article(*wanted)
                )
            }
            Self::NoNumber { wanted } => {
                format!(
                    "{} must begin with a number",
                    quantity_with_article(*wanted)
                )
            }
            Self::NotFinite { wanted } => {
                format!("{} must be a finite number", quantity_with_article(*wanted))
            }
            Self::DecimalComma { .. } => "a comma stands in the number".to_owned(),
            Self::BrokenNumber { .. } => "the number has a gap".to_owned(),
            Self::Fraction { .. } => "a fraction is not read as a number".to_owned(),
            Self::MissingUnit { wanted, .. } => {
                let units = or_list(units_of(*wanted).map(Unit::symbol));
                format!(
                    "{} needs a unit, such as {units}",
                    quantity_with_article(*wanted)
                )
            }
            Self::WrongKind {
                wanted,
                found,
                unit,
            } => format!(
                "{unit} is {}, but {} is wanted",
                quantity_with_article(*found),
                quantity_with_article(*wanted)
            ),
            Self::UnknownUnit { wanted, unit, .. } => {
                let shown: String = unit.chars().take(20).collect();
                format!("{shown} is not a unit of {}", quantity_name(*wanted))
            }
            Self::TooLarge { wanted } => {
                format!(
                    "the number is too large for {}",
                    quantity_with_article(*wanted)
                )
            }
            Self::TooSmall { wanted } => {
                format!(
                    "the number is too near zero for {}",
                    quantity_with_article(*wanted)
                )
            }
            Self::NotWhole => "a count is a whole number".to_owned(),
            Self::BelowAbsoluteZero => "the temperature lies below absolute zero".to_owned(),
        }
    }

    /// What would do: lower case, no full stop.
    #[must_use]
    pub fn hint(&self) -> String {
        let such_as = |wanted: Quantity| {
            format!(
                "write {} such as \"{}\"",
                quantity_with_article(wanted),
                sample_text(wanted)
            )
        };
        match self {
            Self::DecimalComma { with_point } => {
                format!("use a point for decimals and nothing between thousands: {with_point}")
            }
            Self::BrokenNumber { joined } => format!("write the number in one piece: {joined}"),
            Self::Fraction { wanted } => {
                format!(
                    "write it as a decimal number, such as \"{}\"",
                    sample_text(*wanted)
                )
            }
            Self::MissingUnit { wanted, number } => {
                let usual = crate::units::UnitSystem::Metric.unit(*wanted);
                format!("write \"{number} {usual}\" if that is meant")
            }
            Self::UnknownUnit {
                nearest: Some(nearest),
                ..
            } => format!("did you mean {nearest}?"),
            Self::UnknownUnit { wanted, .. } => {
                format!(
                    "units of {}: {}",
                    quantity_name(*wanted),
                    or_list(units_of(*wanted).map(Unit::symbol))
                )
            }
            Self::NotWhole => "leave out the part behind the point".to_owned(),
            Self::BelowAbsoluteZero => {
                "absolute zero is -273.15 degC, -459.67 degF or 0 K".to_owned()
            }
            Self::Empty { wanted }
            | Self::TooLong { wanted }
            | Self::NoNumber { wanted }
            | Self::NotFinite { wanted }
            | Self::WrongKind { wanted, .. }
            | Self::TooLarge { wanted }
            | Self::TooSmall { wanted } => such_as(*wanted),
        }
    }
}

/// The first few names as `mm, um or cm`.
fn or_list<'a>(names: impl Iterator<Item = &'a str>) -> String {
    let names: Vec<_> = names.take(5).collect();
    match names.split_last() {
        None => String::new(),
        Some((last, [])) => (*last).to_owned(),
        Some((last, rest)) => format!("{} or {last}", rest.join(", ")),
    }
}
