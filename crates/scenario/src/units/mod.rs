//! Units: what may be typed behind a number, and what it is worth in SI.
//!
//! All conversions are exact up to one final rounding to `f64`. A number therefore survives
//! reading, writing and a change of units unharmed; see [`crate::quantity_text`].
//!
//! # Source
//! ISO 80000 (SI) and NIST Special Publication 811 (2008), Appendix B (US customary units).

mod decimal;
mod kind;
mod ratio;
mod scale;
mod spelling;
mod system;
mod table;

use std::fmt;
use std::sync::LazyLock;

use helmsplit_model::Quantity;

pub(crate) use decimal::Decimal;
pub use kind::{QUANTITIES, quantity_name, quantity_with_article, sample_text};
pub(crate) use ratio::Ratio;
pub(crate) use scale::Scale;
pub(crate) use spelling::plain_spelling;
pub use system::UnitSystem;

/// A unit of one kind of quantity. Units live in one fixed table and are handed out by reference.
#[derive(Debug)]
pub struct Unit {
    quantity: Quantity,
    symbol: &'static str,
    aliases: &'static [&'static str],
    scale: Scale,
    /// The factor and its inverse, each rounded once, for bulk conversion.
    factor: f64,
    inverse: f64,
    shift: f64,
}

/// Two units are the same when they stand in the same row of the table.
impl PartialEq for Unit {
    fn eq(&self, other: &Self) -> bool {
        self.quantity == other.quantity && self.symbol == other.symbol
    }
}

impl Eq for Unit {}

impl fmt::Display for Unit {
    fn fmt(&self, formatter: &mut fmt::Formatter<'_>) -> fmt::Result {
        formatter.write_str(self.symbol)
    }
}

impl Unit {
    /// The kind of quantity this unit measures.
    #[must_use]
    pub fn quantity(&self) -> Quantity {
        self.quantity
    }

    /// The symbol in plain characters, such as `L/min`. The unit of a bare number is `1`.
    #[must_use]
    pub fn symbol(&self) -> &'static str {
        self.symbol
    }

    /// Other spellings that are understood, besides superscripts, `µ`, `°`, `·` and spaces.
    #[must_use]
    pub fn aliases(&self) -> &'static [&'static str] {
        self.aliases
    }

    /// Whether a number may stand alone, without this unit's symbol.
    #[must_use]
    pub fn is_bare(&self) -> bool {
        self.symbol == "1"
    }

    /// The SI value of `value` in this unit, for bulk data such as a logged column. At most two
    /// roundings; text goes through [`crate::quantity_text`], which rounds once.
    #[must_use]
    pub fn si_from_value(&self, value: f64) -> f64 {
        let raised = value + self.shift;
        // Multiplying by whole factors and dividing by whole inverses keeps 3.7 mm = 0.0037 m.
        if self.factor >= 1.0 {
            raised * self.factor
        } else {
            raised / self.inverse
        }
    }

    /// The value in this unit of the SI number `si`, for bulk data such as a plotted trace.
    #[must_use]
    pub fn value_from_si(&self, si: f64) -> f64 {
        let scaled = if self.factor >= 1.0 {
            si / self.factor
        } else {
            si * self.inverse
        };
        scaled - self.shift
    }

    /// The SI size of a *difference* of `value` in this unit: the shift of a temperature scale
    /// does not apply.
    #[must_use]
    pub fn si_from_difference(&self, value: f64) -> f64 {
        if self.factor >= 1.0 {
            value * self.factor
        } else {
            value / self.inverse
        }
    }

    pub(crate) fn scale(&self) -> &Scale {
        &self.scale
    }

    fn is_spelled(&self, plain: &str) -> bool {
        self.symbol == plain || self.aliases.contains(&plain)
    }
}

static UNITS: LazyLock<Vec<Unit>> = LazyLock::new(|| {
    let resolve = |row: &table::Definition| {
        let scale = Scale::from_texts(row.times, row.over, row.shift)?;
        let (factor, inverse, shift) = (scale.factor(), scale.inverse(), scale.shift());
        let table::Definition {
            quantity,
            symbol,
            aliases,
            ..
        } = *row;
        Some(Unit {
            quantity,
            symbol,
            aliases,
            scale,
            factor,
            inverse,
            shift,
        })
    };
    // A test holds that no row is dropped here.
    table::DEFINITIONS.iter().filter_map(resolve).collect()
});

/// Every unit; within one quantity the SI unit stands first.
#[must_use]
pub fn all_units() -> &'static [Unit] {
    &UNITS
}

/// The units in which a quantity may be written, SI first.
pub fn units_of(quantity: Quantity) -> impl Iterator<Item = &'static Unit> {
    all_units()
        .iter()
        .filter(move |unit| unit.quantity == quantity)
}

/// The coherent SI unit of a quantity.
#[must_use]
pub fn si_unit(quantity: Quantity) -> &'static Unit {
    let mut units = units_of(quantity);
    units
        .next()
        .unwrap_or_else(|| unreachable!("a test holds that every quantity has units"))
}

/// The unit of `quantity` spelled `text`, in any accepted spelling.
#[must_use]
pub fn unit(quantity: Quantity, text: &str) -> Option<&'static Unit> {
    let plain = plain_spelling(text);
    units_of(quantity).find(|unit| unit.is_spelled(&plain))
}

/// Every unit spelled `text`, whatever it measures: what a unit of the wrong kind is.
pub(crate) fn units_spelled(text: &str) -> impl Iterator<Item = &'static Unit> {
    let plain = plain_spelling(text);
    all_units()
        .iter()
        .filter(move |unit| unit.is_spelled(&plain))
}

#[cfg(test)]
mod tests;
